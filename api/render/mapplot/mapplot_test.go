package mapplot

import (
	"bytes"
	"context"
	"encoding/xml"
	"errors"
	"flag"
	"image/png"
	"io"
	"math"
	"os"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"sync"
	"testing"

	"golang.org/x/image/font/sfnt"
	"gonum.org/v1/plot/font"
	"gonum.org/v1/plot/vg"

	"regimed/regime/assumption"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/whatif"
)

var update = flag.Bool("update", false, "draw the picture in testdata/maps anew")

// shown are shipped cases with axes; change replaces a text in the case.
var shown = []struct{ file, x, y, change, to string }{
	{file: "outfall-span", x: "flow.operating.1=0.1..10 m/s:log", y: "structure.length=5..100 m:log"},
	{file: "twin-stays", x: "flow.speed=0.1..60 m/s:log", y: "structure.diameter=5..500 mm:log", change: `"14 m/s"`, to: `"14 m/s +- 3 m/s"`},
	{file: "quay-bridge", x: "flow.operating.1=25..120 m/s", y: "structure.frequency_torsion=0.65..3 Hz"},
	{file: "survey-wing", x: "flow.speed", y: "structure.frequency_torsion"},
}

// maps computes them once.
var maps = sync.OnceValues(func() ([]*whatif.Map, error) {
	var list []*whatif.Map
	for _, row := range shown {
		text, err := os.ReadFile("../../../testdata/cases/" + row.file + ".json")
		if err != nil {
			return nil, err
		}
		if row.change != "" {
			text = bytes.Replace(text, []byte(row.change), []byte(row.to), 1)
		}
		c, violations, err := input.Decode(text, kind.Schema())
		if err != nil || len(violations) > 0 {
			return nil, errors.New(row.file + " is no case")
		}
		x, err := whatif.ParseMapAxis(c, row.x)
		if err != nil {
			return nil, err
		}
		y, err := whatif.ParseMapAxis(c, row.y)
		if err != nil {
			return nil, err
		}
		m, _, err := whatif.NewMap(context.Background(), c, x, y)
		if err != nil {
			return nil, err
		}
		list = append(list, m)
	}
	return list, nil
})

func shownMaps(t testing.TB) []*whatif.Map {
	t.Helper()
	list, err := maps()
	if err != nil || len(list) != len(shown) {
		t.Fatalf("%d maps: %v", len(list), err)
	}
	return list
}

func drawn(t testing.TB, f Format, m *whatif.Map, width float64) []byte {
	t.Helper()
	var b bytes.Buffer
	if err := Draw(&b, f, m, width); err != nil {
		t.Fatal(err)
	}
	return b.Bytes()
}

// wordsOf are the words of an SVG, each element of text one, by the name of the element.
func wordsOf(t testing.TB, svg []byte) map[string][]string {
	t.Helper()
	list := map[string][]string{}
	var open []string
	decoder := xml.NewDecoder(bytes.NewReader(svg))
	for {
		token, err := decoder.Token()
		if errors.Is(err, io.EOF) {
			return list
		}
		if err != nil {
			t.Fatalf("no XML: %v", err)
		}
		switch x := token.(type) {
		case xml.StartElement:
			open = append(open, x.Name.Local)
		case xml.EndElement:
			open = open[:len(open)-1]
		case xml.CharData:
			if s := strings.TrimSpace(string(x)); s != "" {
				name := open[len(open)-1]
				list[name] = append(list[name], s)
			}
		}
	}
}

// A picture names its case, its axes with units, every class, every assumption that
// has a line, and says what it is not.
func TestPictureSaysWhatItShows(t *testing.T) {
	for i, m := range shownMaps(t) {
		words := wordsOf(t, drawn(t, SVG, m, UsualWidth))
		all := strings.ReplaceAll(strings.Join(words["text"], " "), "\u00a0", " ")
		want := []string{m.X.Name(), m.Y.Name(), m.Case.Lookup(kind.Reference).Text, "Screening, not a design verification", m.Case.Digest()[:12], "The case:"}
		for _, r := range m.Regions {
			if r.Class != nil {
				want = append(want, r.Class.Title)
			} else {
				want = append(want, r.Outside...)
			}
		}
		for _, l := range m.Lines {
			if lengthOf(l.Points) > 0.1 {
				want = append(want, l.Entry.ID)
			}
		}
		if m.Cloud != nil {
			want = append(want, "200 draws from the uncertainty of flow.speed")
		}
		for _, w := range want {
			// A title may be broken into lines, at spaces.
			if !strings.Contains(strings.ReplaceAll(all, " ", ""), strings.ReplaceAll(w, " ", "")) {
				t.Errorf("%s: %q is not among the words %q", shown[i].file, w, all)
			}
		}
		if len(words["title"]) != 1 || words["title"][0] != m.Case.Lookup(kind.Title).Text {
			t.Errorf("%s: titles %q", shown[i].file, words["title"])
		}
		if len(words["desc"]) != 1 || !strings.Contains(words["desc"][0], m.Zone.Class.Title) {
			t.Errorf("%s: descriptions %q", shown[i].file, words["desc"])
		}
	}
}

func lengthOf(points []whatif.Point) float64 {
	sum := 0.0
	for i := 1; i < len(points); i++ {
		sum += math.Hypot(points[i].X-points[i-1].X, points[i].Y-points[i-1].Y)
	}
	return sum
}

// No word covers another or leaves the plot, at any width.
func TestWordsKeepApart(t *testing.T) {
	words := 0
	for i, m := range shownMaps(t) {
		for _, width := range []vg.Length{LeastWidth, 120, UsualWidth, LargestWidth} {
			s := newSheet(m, width*vg.Millimeter)
			var boxes []box
			for _, w := range s.placed.words {
				boxes = append(boxes, w.at)
			}
			for _, b := range s.placed.badges {
				boxes = append(boxes, box{middle: b.at, width: 2 * badgeRadius, high: 2 * badgeRadius})
			}
			for k := range boxes {
				words++
				for _, p := range boxes[k].grid() {
					if p.X < -0.01 || p.Y < -0.01 || p.X > s.width+0.01 || p.Y > s.height+0.01 {
						t.Errorf("%s, %v wide: word %d leaves the plot", shown[i].file, width, k)
						break
					}
				}
				for j := range k {
					if overlap(&boxes[j], &boxes[k]) {
						t.Errorf("%s, %v wide: words %d and %d overlap", shown[i].file, width, j, k)
					}
				}
			}
		}
	}
	if words < 100 {
		t.Errorf("%d words", words)
	}
}

func overlap(a, b *box) bool {
	for _, p := range a.grid() {
		q := b.local(p)
		if math.Abs(float64(q.X)) < float64(b.width/2)-0.1 && math.Abs(float64(q.Y)) < float64(b.high/2)-0.1 {
			return true
		}
	}
	return false
}

// Text beside and under the plot stays on the sheet.
func TestNothingIsCut(t *testing.T) {
	for i, m := range shownMaps(t) {
		for _, width := range []vg.Length{LeastWidth, UsualWidth} {
			s := newSheet(m, width*vg.Millimeter)
			right := s.whole.X - margin + 1
			for _, b := range []block{s.head, s.under, s.foot} {
				if margin+b.width() > right {
					t.Errorf("%s: %q is cut", shown[i].file, b.lines)
				}
			}
			for _, r := range s.rows {
				left := margin
				for k := range r.entries {
					left += r.entries[k].width() + 2*gap
				}
				if left-2*gap > right {
					t.Errorf("%s: a row of the legend is cut", shown[i].file)
				}
			}
			if s.xTitle.width() > s.width || s.yTitle.width() > s.height {
				t.Errorf("%s: the title of an axis is cut", shown[i].file)
			}
			last := s.xTicks[len(s.xTicks)-1]
			if s.corner.X+s.width*vg.Length(last.at)+s.tickStyle().Width(last.label)/2 > s.whole.X {
				t.Errorf("%s: a number is cut", shown[i].file)
			}
		}
	}
}

func TestSameMapSameBytes(t *testing.T) {
	m := shownMaps(t)[1]
	for _, f := range []Format{SVG, PNG} {
		if !bytes.Equal(drawn(t, f, m, 120), drawn(t, f, m, 120)) {
			t.Errorf("two pictures of form %d differ", f)
		}
	}
}

// The points of a PNG in the middle of a region have the colour of its class.
func TestPNGShowsRegions(t *testing.T) {
	looked := 0
	for i, m := range shownMaps(t) {
		image, err := png.Decode(bytes.NewReader(drawn(t, PNG, m, 120)))
		if err != nil {
			t.Fatal(err)
		}
		s := newSheet(m, 120*vg.Millimeter)
		size := image.Bounds().Size()
		if want := 120 / 25.4 * dotsPerInch; math.Abs(float64(size.X)-want) > 1 {
			t.Errorf("%s: %d points wide, want %.0f", shown[i].file, size.X, want)
		}
		counts := map[[3]uint32]int{}
		for y := range size.Y {
			for x := range size.X {
				r, g, b, _ := image.At(x, y).RGBA()
				counts[[3]uint32{r >> 8, g >> 8, b >> 8}]++
			}
		}
		scale := float64(s.width*s.height) / float64(s.whole.X*s.whole.Y) * float64(size.X*size.Y)
		shares := map[*whatif.Zone]float64{}
		for _, r := range m.Regions {
			shares[r.Zone] += r.Area
		}
		for z, share := range shares {
			if z.Class == nil || share < 0.02 {
				continue
			}
			r, g, b, _ := colourOf(z).RGBA()
			if got := float64(counts[[3]uint32{r >> 8, g >> 8, b >> 8}]) / scale; got > 1.02*share || got < 0.7*share {
				t.Errorf("%s: %s covers %.3f of the plot, want %.3f", shown[i].file, z.Class.ID, got, share)
			}
			looked++
		}
	}
	if looked < 10 {
		t.Errorf("looked at %d classes", looked)
	}
}

// Every class has a colour of its own, also for eyes that lack the cones for green
// or red (Viénot, Brettel & Mollon 1999, matrices from memory), and one on which
// black words are read.
func TestColoursAreToldApart(t *testing.T) {
	for i := range ladder.Classes {
		a := ladder.Classes[i].ID
		if _, ok := colours[a]; !ok {
			t.Errorf("%s has no colour", a)
		}
		if l := lab(linear(a))[0]; l < 60 {
			t.Errorf("%s is too dark for words: L* %.0f", a, l)
		}
		for k := range i {
			b := ladder.Classes[k].ID
			for sight, least := range map[string]float64{"": 10, "no green": 7.5, "no red": 7.5} {
				if d := difference(seen(linear(a), sight), seen(linear(b), sight)); d < least {
					t.Errorf("%s and %s differ by %.1f, %q", a, b, d, sight)
				}
			}
		}
	}
	if len(colours) != len(ladder.Classes) {
		t.Errorf("%d colours for %d classes", len(colours), len(ladder.Classes))
	}
}

// linear is the colour of a class as linear light, red, green, blue.
func linear(class string) (c [3]float64) {
	rgb := colours[class]
	for i, v := range []uint8{rgb.R, rgb.G, rgb.B} {
		x := float64(v) / 255
		if c[i] = math.Pow((x+0.055)/1.055, 2.4); x <= 0.04045 {
			c[i] = x / 12.92
		}
	}
	return c
}

func seen(c [3]float64, sight string) [3]float64 {
	l := 17.8824*c[0] + 43.5161*c[1] + 4.11935*c[2]
	m := 3.45565*c[0] + 27.1554*c[1] + 3.86714*c[2]
	s := 0.0299566*c[0] + 0.184309*c[1] + 1.46709*c[2]
	switch sight {
	case "no green":
		m = 0.494207*l + 1.24827*s
	case "no red":
		l = 2.02344*m - 2.52581*s
	default:
		return c
	}
	c = [3]float64{
		0.080944447905*l - 0.130504409160*m + 0.116721066437*s,
		-0.010248533515*l + 0.054019326636*m - 0.113614708214*s,
		-0.000365296938*l - 0.004121614686*m + 0.693511404861*s}
	for i := range c {
		c[i] = min(max(c[i], 0), 1)
	}
	return c
}

// lab is CIE L*a*b* of linear light in the primaries of sRGB.
func lab(c [3]float64) [3]float64 {
	f := func(t float64) float64 {
		if t > 216.0/24389 {
			return math.Cbrt(t)
		}
		return (24389.0/27*t + 16) / 116
	}
	x := f((0.4124564*c[0] + 0.3575761*c[1] + 0.1804375*c[2]) / 0.95047)
	y := f(0.2126729*c[0] + 0.7151522*c[1] + 0.0721750*c[2])
	z := f((0.0193339*c[0] + 0.1191920*c[1] + 0.9503041*c[2]) / 1.08883)
	return [3]float64{116*y - 16, 500 * (x - y), 200 * (y - z)}
}

func difference(a, b [3]float64) float64 {
	p, q := lab(a), lab(b)
	return math.Sqrt((p[0]-q[0])*(p[0]-q[0]) + (p[1]-q[1])*(p[1]-q[1]) + (p[2]-q[2])*(p[2]-q[2]))
}

func TestTicks(t *testing.T) {
	room := func(most int) func([]tick) bool {
		return func(list []tick) bool {
			n := 0
			for _, k := range list {
				if k.label != "" {
					n++
				}
			}
			return n <= most
		}
	}
	rows := []struct {
		from, to float64
		log      bool
		most     int
		want     string
	}{
		{0.1, 10, true, 9, "0.1 0.2 0.5 1 2 5 10"},
		{0.1, 10, true, 4, "0.1 1 10"},
		{1e-9, 1e-3, true, 7, "1e−9 1e−8 1e−7 1e−6 1e−5 1e−4 1e−3"},
		{1e-9, 1e-3, true, 4, "1e−8 1e−6 1e−4"},
		{2, 9, true, 9, "2 3 4 5 6 8"},
		{3, 5, true, 6, "3.0 3.5 4.0 4.5 5.0"},
		{0, 30, false, 9, "0 5 10 15 20 25 30"},
		{-1, 1, false, 6, "−1.0 −0.5 0 0.5 1.0"},
		{0.65, 3, false, 9, "1.0 1.5 2.0 2.5 3.0"},
	}
	for _, r := range rows {
		a := axis{&whatif.MapAxis{From: r.from, To: r.to, Log: r.log}, "", 1, 0}
		var labels []string
		for _, k := range a.ticks(room(r.most)) {
			if k.label != "" {
				labels = append(labels, k.label)
			}
		}
		if got := strings.Join(labels, " "); got != r.want {
			t.Errorf("%g to %g: %s, want %s", r.from, r.to, got, r.want)
		}
	}
	if len(rows) != 9 {
		t.Errorf("ran %d rows", len(rows))
	}
}

// An axis is drawn in the unit in which its range was written, else in one of the
// trade.
func TestUnitsOfAxes(t *testing.T) {
	c := shownMaps(t)[0].Case
	rows := []struct{ text, unit, title, amount string }{
		{"structure.diameter=100..900 mm", "mm", "structure.diameter (mm)", "500 mm"},
		{"structure.length=5 m..20 m:log", "m", "structure.length (m)", "10 m"},
		{"fluid.temperature=0..20 degC", "°C", "fluid.temperature (°C)", "10 °C"},
		{"structure.damping_ratio=0.1..10 %:log", "%", "structure.damping_ratio (%)", "1%"},
		{"structure.contents_density=800..1200 kg/m3", "kg/m³", "structure.contents_density (kg/m³)", "1000 kg/m³"},
		{"surroundings.wall_gap", "ft", "surroundings.wall_gap (ft)", "1.5 ft"},
	}
	for _, r := range rows {
		m, err := whatif.ParseMapAxis(c, r.text)
		if err != nil {
			t.Fatal(err)
		}
		a := newAxis(&m)
		_, path := a.title(func(string) bool { return true })
		if a.unit != r.unit || path != r.title || a.amount(a.At(0.5)) != r.amount {
			t.Errorf("%s: unit %q, title %q, middle %q", r.text, a.unit, path, a.amount(a.At(0.5)))
		}
		m.Unit = "" // as if it had been given otherwise
		if a = newAxis(&m); math.Abs(a.factor*a.of(m.At(0.3))+a.zero-m.At(0.3)) > 1e-9*m.At(0.3) {
			t.Errorf("%s: the unit %q does not come back", r.text, a.unit)
		}
	}
	if len(rows) != 6 {
		t.Errorf("ran %d rows", len(rows))
	}
}

// A line has gaps where words stand, and keeps the rest.
func TestGaps(t *testing.T) {
	line := []vg.Point{{}, {X: 40}, {X: 100}}
	pieces := gaps(line, []box{{middle: vg.Point{X: 20}, width: 10, high: 4}, {middle: vg.Point{X: 40, Y: 1}, width: 20, high: 4}, {middle: vg.Point{X: 80, Y: 9}, width: 20, high: 4}})
	want := [][2]vg.Length{{0, 15}, {25, 30}, {50, 100}}
	if len(pieces) != len(want) {
		t.Fatalf("%d pieces", len(pieces))
	}
	for i, p := range pieces {
		if math.Abs(float64(p[0].X-want[i][0])) > 1e-9 || math.Abs(float64(p[len(p)-1].X-want[i][1])) > 1e-9 {
			t.Errorf("piece %d from %v to %v", i, p[0].X, p[len(p)-1].X)
		}
	}
	slanted := box{middle: vg.Point{X: 50, Y: 50}, width: 20, high: 2, angle: math.Pi / 4}
	if from, to := slanted.covers(vg.Point{}, vg.Point{X: 100, Y: 100}); math.Abs((to-from)*100*math.Sqrt2-20) > 1e-9 {
		t.Errorf("a slanted box covers %v to %v", from, to)
	}
}

func TestFormatOf(t *testing.T) {
	for path, want := range map[string]Format{"a.svg": SVG, "b/c.PNG": PNG} {
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

// The font has a glyph for every sign that a picture may show of its own.
func TestEveryGlyphExists(t *testing.T) {
	face := font.DefaultCache.Lookup(style(textSize, ink, 0).Font, 10)
	var buffer sfnt.Buffer
	look := func(words ...string) {
		for _, w := range words {
			for _, r := range w {
				if i, err := face.Face.GlyphIndex(&buffer, r); err != nil || i == 0 {
					t.Errorf("no glyph for %q in %q", r, w)
				}
			}
		}
	}
	look("−°µ²³·% \u00a0")
	for i := range ladder.Classes {
		look(ladder.Classes[i].Title)
	}
	for _, e := range assumption.Catalogue {
		look(e.ID)
	}
	for _, k := range kind.All {
		look(k.Title)
		for _, f := range k.Fields {
			look(f.Doc, f.Path(), f.Kind.SI())
		}
	}
}

// The picture in the documentation is what the program draws, up to rounding. With
// -update it is drawn anew.
func TestShownPictureIsUpToDate(t *testing.T) {
	const name = "../../../testdata/maps/outfall-span.svg"
	made := drawn(t, SVG, shownMaps(t)[0], UsualWidth)
	if *update {
		if err := os.WriteFile(name, made, 0o666); err != nil {
			t.Fatal(err)
		}
	}
	old, err := os.ReadFile(name)
	if err != nil {
		t.Fatal(err)
	}
	// The rules and the version have digests of their own, which change more often
	// than the picture.
	foot := regexp.MustCompile(`regimed\x{a0}.*?case`)
	was, is := foot.Split(string(old), -1), foot.Split(string(made), -1)
	if a, b := shape(strings.Join(was, "")), shape(strings.Join(is, "")); !near(a, b) {
		t.Errorf("%s is out of date: go test ./api/render/mapplot -run Shown -update", name)
	}
}

// shape takes the numbers out of a text: what stands between them, and they.
type shapes struct {
	between []string
	numbers []float64
}

func shape(svg string) shapes {
	number := regexp.MustCompile(`-?\d+(\.\d+)?(e[-+]?\d+)?`)
	s := shapes{between: number.Split(svg, -1)}
	for _, text := range number.FindAllString(svg, -1) {
		x, err := strconv.ParseFloat(text, 64)
		if err != nil {
			x = math.NaN()
		}
		s.numbers = append(s.numbers, x)
	}
	return s
}

func near(a, b shapes) bool {
	if !slices.Equal(a.between, b.between) {
		return false
	}
	for i := range a.numbers {
		if !(math.Abs(a.numbers[i]-b.numbers[i]) <= 0.02) {
			return false
		}
	}
	return true
}

func BenchmarkDraw(b *testing.B) {
	m := shownMaps(b)[0]
	for b.Loop() {
		if err := Draw(io.Discard, SVG, m, UsualWidth); err != nil {
			b.Fatal(err)
		}
	}
}
