package api

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"html"
	"image"
	"image/color"
	"image/draw"
	"image/png"
	"strconv"
	"strings"

	"golang.org/x/image/font"
	"golang.org/x/image/font/basicfont"
	"golang.org/x/image/math/fixed"
)

// Marks put a note at the top of what was drawn. A picture or a table goes into
// a report without the headers of its answer, so the note has to be part of it.

// markText puts the note above the page.
func markText(body []byte, note string) ([]byte, error) {
	lines := strings.Join(folded(note, 96), "\n") + "\n\n"
	return append([]byte(lines), body...), nil
}

// markMarkdown puts the note above the text, as a quotation.
func markMarkdown(body []byte, note string) ([]byte, error) {
	return append([]byte("> "+note+"\n\n"), body...), nil
}

// markCSV puts the note above the table, behind a #, as most readers of tables
// expect a comment. One that does not will stumble, rather than read numbers
// that are not those of the record.
func markCSV(body []byte, note string) ([]byte, error) {
	return append([]byte("# "+note+"\r\n"), body...), nil
}

// markHTML puts the note first in the body of the page.
func markHTML(body []byte, note string) ([]byte, error) {
	at := bytes.Index(body, []byte("<body"))
	if at < 0 {
		return nil, errors.New("api: a page without a body has no place for a note")
	}
	end := bytes.IndexByte(body[at:], '>')
	if end < 0 {
		return nil, errors.New("api: the body of a page has no beginning")
	}
	at += end + 1
	line := `<p role="note"><strong>` + html.EscapeString(note) + `</strong></p>`
	return bytes.Join([][]byte{body[:at], []byte(line), body[at:]}, nil), nil
}

// Sizes of a note in a picture. basicfont's letters are 7 wide and 13 high.
const (
	noteLine   = 16
	noteMargin = 8
	noteLetter = 7
)

// noteRows folds a note to the width of a picture, and says how high it gets.
func noteRows(note string, width int) (rows []string, height int) {
	rows = folded(note, max((width-2*noteMargin)/noteLetter, 1))
	return rows, len(rows)*noteLine + noteMargin
}

// markSVG puts the picture into one that is higher, below the note.
func markSVG(body []byte, note string) ([]byte, error) {
	root, inner, err := rootOfSVG(body)
	if err != nil {
		return nil, err
	}
	width, height := sizeOfSVG(root.Attr)
	if !(width > 0 && height > 0) {
		return nil, errors.New("api: a picture without a size has no place for a note")
	}
	rows, extra := noteRows(note, int(width))
	var b bytes.Buffer
	fmt.Fprintf(&b, `<svg xmlns="http://www.w3.org/2000/svg" width="%g" height="%g" viewBox="0 0 %g %g">`, width, height+float64(extra), width, height+float64(extra))
	fmt.Fprintf(&b, `<rect width="%g" height="%d" fill="#ffffff"/>`, width, extra)
	for i, row := range rows {
		fmt.Fprintf(&b, `<text x="%d" y="%d" font-family="monospace" font-size="11.5" fill="#000000">%s</text>`, noteMargin, (i+1)*noteLine, html.EscapeString(row))
	}
	fmt.Fprintf(&b, `<svg y="%d" width="%g" height="%g"`, extra, width, height)
	for _, a := range root.Attr {
		switch a.Name.Local {
		case "x", "y", "width", "height":
			continue
		}
		name := a.Name.Local
		if a.Name.Space != "" {
			name = a.Name.Space + ":" + name
		}
		fmt.Fprintf(&b, ` %s="%s"`, name, html.EscapeString(a.Value))
	}
	b.WriteByte('>')
	b.Write(inner)
	b.WriteString("</svg>\n")
	return b.Bytes(), nil
}

// rootOfSVG finds the outermost element, and all that follows its beginning.
func rootOfSVG(body []byte) (xml.StartElement, []byte, error) {
	dec := xml.NewDecoder(bytes.NewReader(body))
	for {
		token, err := dec.RawToken()
		if err != nil {
			return xml.StartElement{}, nil, errors.New("api: a picture that is no SVG has no place for a note")
		}
		start, isStart := token.(xml.StartElement)
		if !isStart {
			continue
		}
		rest := body[dec.InputOffset():]
		if start.Name.Local != "svg" || !bytes.Contains(rest, []byte("</svg")) {
			return xml.StartElement{}, nil, errors.New("api: a picture that is no SVG has no place for a note")
		}
		return start.Copy(), rest, nil
	}
}

// sizeOfSVG is the size in the picture's own coordinates: that of its viewBox,
// or its width and height.
func sizeOfSVG(attributes []xml.Attr) (width, height float64) {
	for _, a := range attributes {
		switch a.Name.Local {
		case "viewBox":
			if f := strings.FieldsFunc(a.Value, func(r rune) bool { return r == ' ' || r == ',' }); len(f) == 4 {
				return leadingNumber(f[2]), leadingNumber(f[3])
			}
		case "width":
			width = leadingNumber(a.Value)
		case "height":
			height = leadingNumber(a.Value)
		}
	}
	return width, height
}

// leadingNumber reads a length without its unit; 0 where it is none.
func leadingNumber(s string) float64 {
	x, err := strconv.ParseFloat(strings.TrimRight(s, "abcdefghijklmnopqrstuvwxyz%"), 64)
	if err != nil {
		return 0
	}
	return x
}

// markPNG puts the picture below the note, on a higher one.
func markPNG(body []byte, note string) ([]byte, error) {
	old, err := png.Decode(bytes.NewReader(body))
	if err != nil {
		return nil, err
	}
	size := old.Bounds().Size()
	rows, extra := noteRows(note, size.X)
	made := image.NewNRGBA(image.Rect(0, 0, size.X, size.Y+extra))
	draw.Draw(made, made.Bounds(), image.White, image.Point{}, draw.Src)
	draw.Draw(made, image.Rect(0, extra, size.X, size.Y+extra), old, old.Bounds().Min, draw.Over)
	pen := font.Drawer{Dst: made, Src: image.NewUniform(color.Black), Face: basicfont.Face7x13}
	for i, row := range rows {
		pen.Dot = fixed.P(noteMargin, (i+1)*noteLine)
		pen.DrawString(row)
	}
	var b bytes.Buffer
	err = png.Encode(&b, made)
	return b.Bytes(), err
}

// folded breaks a text into lines of at most so many letters, also inside a
// word where that is longer.
func folded(s string, most int) []string {
	var lines []string
	line := ""
	for word := range strings.FieldsSeq(s) {
		if line != "" && len(line)+1+len(word) <= most {
			line += " " + word
			continue
		}
		if line != "" {
			lines = append(lines, line)
		}
		for len(word) > most {
			lines, word = append(lines, word[:most]), word[most:]
		}
		line = word
	}
	return append(lines, line)
}
