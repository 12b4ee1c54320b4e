package api

import (
	"bytes"
	"encoding/csv"
	"encoding/xml"
	"errors"
	"image"
	"image/color"
	"image/png"
	"io"
	"strings"
	"testing"
)

const aNote = `Answered by regimed 0.1.0 on 2026-07-30; drawn by regimed 0.2.0, whose answer differs: class <a> & "b".`

func marked(t *testing.T, mark func([]byte, string) ([]byte, error), body string) string {
	t.Helper()
	made, err := mark([]byte(body), aNote)
	if err != nil {
		t.Fatal(err)
	}
	return string(made)
}

func TestMarkedText(t *testing.T) {
	got := marked(t, markText, "Recommended: …\n")
	note, page, found := strings.Cut(got, "\n\n")
	if !found || page != "Recommended: …\n" || strings.Join(strings.Fields(note), " ") != aNote {
		t.Errorf("%q", got)
	}
	for line := range strings.Lines(note) {
		if len(line) > 97 {
			t.Errorf("a line of %d", len(line))
		}
	}
	if got := marked(t, markMarkdown, "# Answer\n"); got != "> "+aNote+"\n\n# Answer\n" {
		t.Errorf("%q", got)
	}
}

// A reader of tables that knows comments reads the table as it was.
func TestMarkedTable(t *testing.T) {
	r := csv.NewReader(strings.NewReader(marked(t, markCSV, "id,value\r\nreynolds,\"1,5\"\r\n")))
	r.Comment = '#'
	rows, err := r.ReadAll()
	if err != nil || len(rows) != 2 || rows[1][1] != "1,5" {
		t.Errorf("%v: %v", err, rows)
	}
}

func TestMarkedPage(t *testing.T) {
	got := marked(t, markHTML, "<!doctype html><html><body class=\"a\">\n<h1>Answer</h1></body></html>")
	if want := `<body class="a"><p role="note"><strong>Answered`; !strings.Contains(got, want) || strings.Contains(got, "<a>") || !strings.HasSuffix(got, "<h1>Answer</h1></body></html>") {
		t.Errorf("%s", got)
	}
	for _, bad := range []string{"", "<p>", "<body"} {
		if made, err := markHTML([]byte(bad), aNote); err == nil {
			t.Errorf("%q became %q", bad, made)
		}
	}
}

// The picture stands below the note, whole and at its own size.
func TestMarkedSVG(t *testing.T) {
	rows := []struct {
		name, body, inner string
	}{
		{"sizes", `<?xml version="1.0"?><!-- made --><svg xmlns="http://www.w3.org/2000/svg" width="400" height="300"><path d="M0 0"/></svg>`, `<svg y="40" width="400" height="300" xmlns="http://www.w3.org/2000/svg"><path d="M0 0"/></svg>`},
		{"points and a box", `<svg width="6in" height="4.5in" viewBox="0 0 400 300" xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink"><g/></svg>`,
			`<svg y="40" width="400" height="300" viewBox="0 0 400 300" xmlns="http://www.w3.org/2000/svg" xmlns:xlink="http://www.w3.org/1999/xlink"><g/></svg>`},
		{"a box alone", `<svg xmlns="http://www.w3.org/2000/svg" viewBox="-10,-10,400,300" class="a&quot;b"><g/></svg>`,
			`<svg y="40" width="400" height="300" xmlns="http://www.w3.org/2000/svg" viewBox="-10,-10,400,300" class="a&#34;b"><g/></svg>`},
	}
	for _, row := range rows {
		got := marked(t, markSVG, row.body)
		if !strings.Contains(got, row.inner) || !strings.Contains(got, `viewBox="0 0 400 340"`) || strings.Count(got, "<text") != 2 {
			t.Errorf("%s: %s", row.name, got)
		}
		if err := wellFormed(got); err != nil {
			t.Errorf("%s: %v: %s", row.name, err, got)
		}
	}
	if len(rows) != 3 {
		t.Errorf("%d rows", len(rows))
	}
	for _, bad := range []string{"", "<svg", "<html></html>", `<svg width="1" height="1"/>`, "<svg></svg>", `<svg width="a" height="1"></svg>`, `<svg width="NaN" height="1"></svg>`} {
		if made, err := markSVG([]byte(bad), aNote); err == nil {
			t.Errorf("%q became %q", bad, made)
		}
	}
}

func wellFormed(s string) error {
	dec := xml.NewDecoder(strings.NewReader(s))
	for {
		if _, err := dec.Token(); errors.Is(err, io.EOF) {
			return nil
		} else if err != nil {
			return err
		}
	}
}

func TestMarkedPNG(t *testing.T) {
	old := image.NewNRGBA(image.Rect(0, 0, 300, 100))
	blue := color.NRGBA{B: 255, A: 255}
	for x := range 300 {
		for y := range 100 {
			old.SetNRGBA(x, y, blue)
		}
	}
	var b bytes.Buffer
	if err := png.Encode(&b, old); err != nil {
		t.Fatal(err)
	}
	made, err := png.Decode(strings.NewReader(marked(t, markPNG, b.String())))
	if err != nil {
		t.Fatal(err)
	}
	size := made.Bounds().Size()
	_, extra := noteRows(aNote, 300)
	if size.X != 300 || size.Y != 100+extra || extra < 3*noteLine {
		t.Fatalf("size %v, note %d", size, extra)
	}
	dark, below := 0, 0
	for x := range size.X {
		for y := range size.Y {
			r, g, bl, _ := made.At(x, y).RGBA()
			if y < extra && r+g+bl < 0x8000 {
				dark++
			}
			if y >= extra && color.NRGBAModel.Convert(made.At(x, y)) == blue {
				below++
			}
		}
	}
	if dark < 300 || below != 300*100 {
		t.Errorf("%d dark points in the note, %d of the picture", dark, below)
	}
	if _, err := markPNG([]byte("no picture"), aNote); err == nil {
		t.Error("no error")
	}
}

func TestFolded(t *testing.T) {
	rows := []struct {
		text string
		most int
		want string
	}{
		{"a bb ccc", 8, "a bb ccc"}, {"a bb ccc", 7, "a bb|ccc"}, {"a bb ccc", 1, "a|b|b|c|c|c"}, {"abcdef g", 4, "abcd|ef g"}, {"", 5, ""}, {" a  b ", 5, "a b"},
	}
	for _, row := range rows {
		if got := strings.Join(folded(row.text, row.most), "|"); got != row.want {
			t.Errorf("%q at %d: %q", row.text, row.most, got)
		}
	}
	if len(rows) != 6 {
		t.Errorf("%d rows", len(rows))
	}
}
