package marginchart

import (
	"bytes"
	"encoding/xml"
	"errors"
	"image/png"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"

	"golang.org/x/image/font/sfnt"
	"gonum.org/v1/plot/font"
	"pgregory.net/rapid"

	"regimed/regime/finding"
)

// element is a shape of an SVG.
type element struct {
	name  string
	attrs map[string]string
	text  string
}

func read(t rapid.TB, svg []byte) []element {
	t.Helper()
	var list []element
	d := xml.NewDecoder(bytes.NewReader(svg))
	for {
		token, err := d.Token()
		if errors.Is(err, io.EOF) {
			return list
		}
		if err != nil {
			t.Fatalf("%v in %s", err, svg)
		}
		switch x := token.(type) {
		case xml.StartElement:
			e := element{name: x.Name.Local, attrs: map[string]string{}}
			for _, a := range x.Attr {
				e.attrs[a.Name.Local] = a.Value
			}
			list = append(list, e)
		case xml.CharData:
			if len(list) > 0 {
				list[len(list)-1].text += strings.TrimSpace(string(x))
			}
		}
	}
}

func number(t rapid.TB, s string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

// utilisation reads a place on the scale back.
func utilisation(x float64) float64 {
	return (x-scaleLeft)/scaleWidth*2*Decades - Decades
}

// Bars end at log10(u), brackets reach from log10(u/φ) to log10(u·φ), both held to
// the scale; bars stand worst first, each with its name, its verdict and figure.
func TestBarsStandWhereTheyBelong(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		c := &Chart{Title: "A & <b>"}
		for i := range rapid.IntRange(1, 40).Draw(t, "bars") {
			u := math.Pow(10, rapid.Float64Range(-6, 6).Draw(t, "log u"))
			inner, factor := rapid.Float64Range(1, 4).Draw(t, "inner"), rapid.Float64Range(1, 4).Draw(t, "factor")
			c.Bars = append(c.Bars, Bar{Name: "bar-" + strconv.Itoa(i), Utilisation: u, Inner: inner, Factor: factor,
				Verdict: finding.Judge(u, factor, inner), Aside: rapid.Bool().Draw(t, "aside"), Figure: "1 / 2"})
		}
		c.Waiting = []Waiting{{"waits", "x is not given"}}
		var ends, bands []element
		var words []string
		for _, e := range read(t, c.AppendSVG(nil)) {
			class := strings.Fields(e.attrs["class"])
			switch {
			case slices.Contains(class, "bar"):
				ends = append(ends, e)
			case slices.Contains(class, "band"):
				bands = append(bands, e)
			case e.name == "text":
				words = append(words, e.text)
			}
		}
		sorted := c.sorted()
		if len(ends) != len(sorted) {
			t.Fatalf("%d bars of %d", len(ends), len(sorted))
		}
		const rounding = 0.02 / scaleWidth * 2 * Decades
		band := 0
		for i, b := range sorted {
			if i > 0 && severity(&b) > severity(&sorted[i-1]) {
				t.Fatalf("%s comes too late", b.Name)
			}
			at := utilisation(number(t, ends[i].attrs["x"]) + number(t, ends[i].attrs["width"]))
			if math.Abs(at-Position(b.Utilisation)) > rounding {
				t.Fatalf("%s ends at %g, want %g", b.Name, at, Position(b.Utilisation))
			}
			low, high := Position(b.Utilisation/b.Inner), Position(b.Utilisation*b.Factor)
			if low < high {
				from, to := utilisation(number(t, bands[band].attrs["x1"])), utilisation(number(t, bands[band].attrs["x2"]))
				if math.Abs(from-low) > rounding || math.Abs(to-high) > rounding {
					t.Fatalf("%s: a band from %g to %g, want %g to %g", b.Name, from, to, low, high)
				}
				band++
			}
			if !slices.Contains(words, b.Name) || !slices.Contains(words, b.verdictWords()) || !strings.Contains(c.Words(), b.Name) {
				t.Fatalf("%s has no words", b.Name)
			}
		}
		if !slices.Contains(words, "waits") || !slices.Contains(words, "undetermined: x is not given") {
			t.Fatal("what waits is not listed")
		}
	})
}

func TestPosition(t *testing.T) {
	rows := map[float64]float64{0: -3, 1e-9: -3, 1e-3: -3, 0.1: -1, 1: 0, 100: 2, 1e3: 3, 1e9: 3, math.Inf(1): 3, -1: -3}
	for u, want := range rows {
		if got := Position(u); math.Abs(got-want) > 1e-12 {
			t.Errorf("%g lies at %g, want %g", u, got, want)
		}
	}
	if got := Position(math.NaN()); got != -3 {
		t.Errorf("NaN lies at %g", got)
	}
	if len(rows) != 10 {
		t.Errorf("%d rows", len(rows))
	}
}

func sample() *Chart {
	return &Chart{Title: "Sample", Foot: "Foot.", Moot: []string{"no-shock"}, Waiting: []Waiting{{"single-mode", "structure.next_frequency is not given"}},
		Bars: []Bar{
			{Name: "one-way", Utilisation: 8, Inner: 1.5, Factor: 1.5, Verdict: finding.Invalid, Figure: "80 % / 10 %"},
			{Name: "inviscid-flow", Utilisation: 0.8, Inner: 2, Factor: 2, Verdict: finding.Marginal, Figure: "8 % / 10 %"},
			{Name: "no-stall", Utilisation: 0.01, Inner: 1.5, Factor: 1.5, Verdict: finding.Valid, Figure: "0.01 / 1"}}}
}

// The image shows the colour of each verdict, at a size that is sharp in print.
func TestPNG(t *testing.T) {
	body, err := sample().PNG()
	if err != nil {
		t.Fatal(err)
	}
	image, err := png.Decode(bytes.NewReader(body))
	if err != nil {
		t.Fatal(err)
	}
	if size := image.Bounds().Size(); size.X != width*dotsPerInch/72 && size.X != width*dotsPerInch/72+1 || size.Y < 200 {
		t.Errorf("the image measures %v", size)
	}
	count := map[[3]uint32]int{}
	for y := range image.Bounds().Dy() {
		for x := range image.Bounds().Dx() {
			r, g, b, _ := image.At(x, y).RGBA()
			count[[3]uint32{r >> 8, g >> 8, b >> 8}]++
		}
	}
	for _, r := range []role{ink, valid, marginal, invalid, undetermined} {
		red, green, blue, _ := paint(r, false).RGBA()
		if n := count[[3]uint32{red >> 8, green >> 8, blue >> 8}]; n < 100 {
			t.Errorf("%s covers %d points", roleNames[r], n)
		}
	}
}

// A chart without bars, and one with names beyond any width, still draw.
func TestOddCharts(t *testing.T) {
	rows := []*Chart{{}, {Waiting: []Waiting{{"a", "b"}}}, {Title: strings.Repeat("W", 500), Foot: strings.Repeat("ü ", 300)}, {Bars: []Bar{{Name: "nan", Utilisation: math.NaN(), Inner: 1, Factor: 1}}}}
	for i, c := range rows {
		svg := c.AppendSVG(nil)
		read(t, svg)
		if bytes.Contains(svg, []byte("NaN")) || c.Words() == "" {
			t.Errorf("row %d: %s", i, svg)
		}
		if _, err := c.PNG(); err != nil {
			t.Errorf("row %d: %v", i, err)
		}
	}
	if len(rows) != 4 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestClip(t *testing.T) {
	if got := Clip("short", 10, false, 100); got != "short" {
		t.Errorf("%q", got)
	}
	rapid.Check(t, func(t *rapid.T) {
		s, room := rapid.String().Draw(t, "s"), rapid.Float64Range(20, 300).Draw(t, "room")
		got := Clip(s, 10, false, room)
		if cut, was := strings.CutSuffix(got, "…"); got != s && (!was || !strings.HasPrefix(s, cut)) {
			t.Fatalf("%q became %q", s, got)
		}
	})
}

// The typeface has a glyph for each sign that every chart shows.
func TestGlyphs(t *testing.T) {
	letters := face(textSize, false)
	loaded := font.DefaultCache.Lookup(letters.Font, 10)
	var buffer sfnt.Buffer
	n := 0
	for _, s := range sample().lay().shapes {
		for _, r := range drawable(s.text) {
			n++
			if i, err := loaded.Face.GlyphIndex(&buffer, r); err != nil || i == 0 {
				t.Errorf("no glyph for %c in %q", r, s.text)
			}
		}
	}
	if n < 200 {
		t.Errorf("%d letters", n)
	}
}
