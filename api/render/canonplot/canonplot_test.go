package canonplot

import (
	"bytes"
	"encoding/xml"
	"errors"
	"fmt"
	"image/png"
	"io"
	"math"
	"slices"
	"strings"
	"testing"

	"golang.org/x/image/font/sfnt"
	"gonum.org/v1/plot"
	"gonum.org/v1/plot/font"

	"regimed/regime/canon"
)

// drawn is what an SVG holds: the strokes by colour, whether dashed, and the words.
type drawn struct {
	solid, dashed map[string]int
	words         string
}

// readSVG decodes the picture as XML, to its end.
func readSVG(t *testing.T, svg []byte) drawn {
	t.Helper()
	d := drawn{solid: map[string]int{}, dashed: map[string]int{}}
	var words strings.Builder
	decoder := xml.NewDecoder(bytes.NewReader(svg))
	for {
		token, err := decoder.Token()
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			t.Fatalf("no XML: %v", err)
		}
		switch x := token.(type) {
		case xml.StartElement:
			if x.Name.Local == "path" {
				d.addPath(x)
			}
		case xml.CharData:
			words.Write(x)
			words.WriteByte(' ')
		}
	}
	d.words = strings.Join(strings.Fields(words.String()), " ")
	return d
}

func (d *drawn) addPath(x xml.StartElement) {
	for _, a := range x.Attr {
		if a.Name.Local != "style" || !strings.Contains(a.Value, "stroke:") {
			continue
		}
		_, rest, _ := strings.Cut(a.Value, "stroke:")
		colour, _, _ := strings.Cut(rest, ";")
		if strings.Contains(a.Value, "stroke-dasharray") {
			d.dashed[rest[strings.Index(rest, "stroke-dasharray"):]]++
		} else {
			d.solid[colour]++
		}
	}
}

func svgOf(t *testing.T, name string, args ...float64) drawn {
	t.Helper()
	var b bytes.Buffer
	if err := Draw(&b, SVG, canon.Find(name), args); err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	return readSVG(t, b.Bytes())
}

// curveColours counts the colours of curves: each is in the picture, and once more
// in the legend.
func curveColours(d drawn) int {
	n := 0
	for _, c := range palette {
		r, g, b, _ := c.RGBA()
		if d.solid[fmt.Sprintf("#%02X%02X%02X", r>>8, g>>8, b>>8)] >= 2 {
			n++
		}
	}
	return n
}

// Every solution has a picture, with a curve for each of its values, its problem
// as the title, its sources, and its symbols.
func TestEverySolutionIsDrawn(t *testing.T) {
	ran := 0
	for _, e := range canon.All() {
		d := svgOf(t, e.Name)
		curves := len(e.Outputs)
		if slices.ContainsFunc(e.Outputs, func(o canon.Output) bool { return o.ID == canon.UncertaintyID }) {
			curves--
		}
		if n := curveColours(d); n != curves {
			t.Errorf("%s: %d curves, want %d", e.Name, n, curves)
		}
		for _, want := range []string{capital(e.Problem), e.Name, e.Sources[0].Short, argSymbol(&e.Args[e.Sweep()]), symbolOf(&e.Outputs[0])} {
			if !strings.Contains(d.words, want) {
				t.Errorf("%s: %q is not among the words %q", e.Name, want, d.words)
			}
		}
		ran++
	}
	if ran != len(canon.All()) || ran < 60 {
		t.Errorf("drew %d solutions", ran)
	}
}

// The limits that a reader looks for are dashed lines.
func TestLimitsAreDashed(t *testing.T) {
	rows := map[string]int{
		"OscillatingCylinder": 4, "OscillatingSphere": 4, "CylinderInShell": 2, "CylinderNearWall": 2, "SoundCylinder": 4, "SoundSphere": 4,
		"BaffledPiston": 4, "FlexuralWaveLoading": 2, "ThinFilm": 3, "ThinFilmLiquid": 2, "PulsatileTube": 4, "WaveNumber": 2,
		"RectangularTank": 4, "UprightTank": 4, "CylinderDiffraction": 3, "StokesSecondOrder": 2, "Theodorsen": 4, "WaveSpeed": 2,
		"PlateMode": 2, "StringMode": 2, "FlagCritical": 2, "PrandtlGlauert": 2,
	}
	for name, want := range rows {
		if d := svgOf(t, name); len(d.dashed) != want {
			t.Errorf("%s: %d dashed lines, want %d", name, len(d.dashed), want)
		}
	}
	if len(rows) != 22 {
		t.Errorf("ran %d rows", len(rows))
	}
}

func TestPNGDecodes(t *testing.T) {
	var b bytes.Buffer
	if err := Draw(&b, PNG, canon.Find("Theodorsen"), nil); err != nil {
		t.Fatal(err)
	}
	image, err := png.Decode(&b)
	if err != nil {
		t.Fatal(err)
	}
	if size := image.Bounds().Size(); size.X != 1063 || size.Y < 600 || size.Y > 1200 {
		t.Errorf("the picture measures %v", size)
	}
	colours := map[[3]uint32]int{}
	for y := range image.Bounds().Dy() {
		for x := range image.Bounds().Dx() {
			r, g, b, _ := image.At(x, y).RGBA()
			colours[[3]uint32{r >> 8, g >> 8, b >> 8}]++
		}
	}
	for _, c := range palette[:2] {
		r, g, b, _ := c.RGBA()
		if n := colours[[3]uint32{r >> 8, g >> 8, b >> 8}]; n < 200 {
			t.Errorf("%v covers only %d points", c, n)
		}
	}
}

// A given argument is marked, and the values there are written out.
func TestGivenArgumentIsMarked(t *testing.T) {
	d := svgOf(t, "OscillatingCylinder", 36)
	if !strings.Contains(d.words, "R = 36: Γr = 1.47272, Γi = 0.525369") {
		t.Errorf("not marked: %s", d.words)
	}
	// Beyond the window, which then reaches to it.
	p, err := sample(canon.Find("OscillatingCylinder"), []float64{1e9})
	if err != nil {
		t.Fatal(err)
	}
	if last := p.x[len(p.x)-1]; last != 1e9 || !p.given {
		t.Errorf("the window ends at %g", last)
	}
	d = svgOf(t, "WakeLockIn", 2)
	if !strings.Contains(d.words, "x_max = ∞") {
		t.Errorf("no sign of what is unbounded: %s", d.words)
	}
	// The others are set, not marked.
	d = svgOf(t, "ConveyingPipe", math.NaN(), -5)
	if !strings.Contains(d.words, "ConveyingPipe at γ = −5, α = 0, support cantilever") {
		t.Errorf("not set: %s", d.words)
	}
}

func TestDrawRefuses(t *testing.T) {
	rows := []struct {
		name string
		args []float64
	}{
		{"OscillatingCylinder", []float64{-1}},             // the argument that is drawn over
		{"CylinderInShell", []float64{math.NaN(), 0.5}},    // another one
		{"LargeAmplitude", []float64{4, math.NaN(), 1, 0}}, // nowhere
		{"OscillatingCylinder", []float64{1, 2}},           // one too many
	}
	for _, r := range rows {
		if err := Draw(io.Discard, SVG, canon.Find(r.name), r.args); err == nil {
			t.Errorf("%s%v is drawn", r.name, r.args)
		}
	}
	var outside *canon.RangeError
	if err := Draw(io.Discard, SVG, canon.Find("LargeAmplitude"), []float64{4, math.NaN(), 1, 0}); !errors.As(err, &outside) {
		t.Errorf("nowhere an answer: %v, want a RangeError", err)
	}
	if len(rows) != 4 {
		t.Errorf("ran %d rows", len(rows))
	}
}

func TestFormatOf(t *testing.T) {
	rows := map[string]Format{"a.svg": SVG, "b/c.PNG": PNG}
	for path, want := range rows {
		if got, err := FormatOf(path); got != want || err != nil {
			t.Errorf("%s: %v, %v", path, got, err)
		}
	}
	for _, path := range []string{"a.pdf", "a", ""} {
		if _, err := FormatOf(path); err == nil {
			t.Errorf("%q has a format", path)
		}
	}
}

// Arguments that do not fit together leave a gap, and ends without an answer are
// left out.
func TestGaps(t *testing.T) {
	p, err := sample(canon.Find("FlatPlate"), nil)
	if err != nil {
		t.Fatal(err)
	}
	if last := p.x[len(p.x)-1]; last > 3e6 || last < 2.5e6 || !p.logX || !p.logY {
		t.Errorf("the laminar layer is drawn to %g, logarithmic %t %t", last, p.logX, p.logY)
	}
	if got := p.pieces(line{1, 2, math.NaN(), 3, math.NaN(), 0, 4, 5}); len(got) != 2 || len(got[0]) != 2 || got[1][0] != 6 {
		t.Errorf("pieces %v", got)
	}
}

func TestTicks(t *testing.T) {
	labels := func(ticks []plot.Tick) string {
		var all []string
		for _, k := range ticks {
			if k.Label != "" {
				all = append(all, k.Label)
			}
		}
		return strings.Join(all, " ")
	}
	rows := []struct{ got, want string }{
		{labels(decades{7}.Ticks(0.01, 100)), "0.01 0.1 1 10 100"},
		{labels(decades{7}.Ticks(1e-12, 1)), "1e−12 1e−10 1e−8 1e−6 1e−4 1e−2 1"},
		{labels(even{7}.Ticks(-0.3, 1)), "−0.2 0 0.2 0.4 0.6 0.8 1.0"},
		{labels(even{5}.Ticks(0, 1.2e6)), "0 5e5 1e6"},
		{labels(even{7}.Ticks(2, 20)), "5 10 15 20"},
		{number(math.Inf(1)), "∞"}, {number(-1.5e-7), "−1.5e−7"}, {number(1e9), "1e9"}, {number(0.525368658), "0.525369"},
	}
	for _, r := range rows {
		if r.got != r.want {
			t.Errorf("got %q, want %q", r.got, r.want)
		}
	}
	if len(rows) != 9 {
		t.Errorf("ran %d rows", len(rows))
	}
}

// The font has a glyph for every sign that any picture may show.
func TestEveryGlyphExists(t *testing.T) {
	face := font.DefaultCache.Lookup(style(textSize, ink, 0).Font, 10)
	var buffer sfnt.Buffer
	missing := map[rune]string{}
	look := func(words ...string) {
		for _, w := range words {
			for _, r := range w {
				if i, err := face.Face.GlyphIndex(&buffer, r); r >= ' ' && (err != nil || i == 0) {
					missing[r] = w
				}
			}
		}
	}
	look("−∞0123456789e.,;:=()", power(-12, false))
	for _, e := range canon.All() {
		look(e.Name, e.Problem)
		look(argSymbol(&e.Args[e.Sweep()]), e.Args[e.Sweep()].Doc)
		for i := range e.Args {
			look(argSymbol(&e.Args[i]))
			look(e.Args[i].Choices...)
		}
		for i := range e.Outputs {
			look(symbolOf(&e.Outputs[i]), e.Outputs[i].Doc)
		}
		for _, l := range e.Limits {
			look(l.Name)
		}
		for _, s := range e.Sources {
			look(s.Short)
		}
	}
	for r, w := range missing {
		t.Errorf("no glyph for %c in %q", r, w)
	}
}
