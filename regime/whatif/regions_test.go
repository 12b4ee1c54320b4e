package whatif

import (
	"context"
	"errors"
	"math"
	"os"
	"reflect"
	"runtime"
	"slices"
	"strings"
	"sync"
	"testing"

	"github.com/go-json-experiment/json/jsontext"
	"pgregory.net/rapid"

	"regimed/regime/assumption"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// mapped are shipped cases with axes, one of each way a map may look.
var mapped = []struct{ file, x, y string }{
	{"outfall-span", "flow.operating.1=0.1..10 m/s:log", "structure.length=5..100 m:log"},
	{"sluice-skin", "structure.thickness=1..100 mm:log", "structure.length=0.1..5 m:log"},
	{"twin-stays", "flow.speed=0.1..60 m/s:log", "structure.diameter=5..500 mm:log"},
	{"quay-bridge", "flow.operating.1=25..120 m/s", "structure.frequency_torsion=0.65..3 Hz"},
	{"tilt-sensor", "structure.gap", "fluid.pressure=0.1..1000 mbar:log"},
	{"survey-wing", "flow.speed", "structure.frequency_torsion"},
}

// mapsOf computes the maps of the shipped cases once.
var mapsOf = sync.OnceValues(func() ([]*Map, error) {
	var list []*Map
	for _, row := range mapped {
		text, err := os.ReadFile("../../testdata/cases/" + row.file + ".json")
		if err != nil {
			return nil, err
		}
		c, _, err := input.Decode(text, kind.Schema())
		if err != nil {
			return nil, err
		}
		x, err := ParseMapAxis(c, row.x)
		if err != nil {
			return nil, err
		}
		y, err := ParseMapAxis(c, row.y)
		if err != nil {
			return nil, err
		}
		m, _, err := NewMap(context.Background(), c, x, y)
		if err != nil {
			return nil, err
		}
		list = append(list, m)
	}
	return list, nil
})

func shippedMaps(t testing.TB) []*Map {
	t.Helper()
	list, err := mapsOf()
	if err != nil || len(list) != len(mapped) {
		t.Fatalf("%d maps: %v", len(list), err)
	}
	return list
}

func mapCase(t testing.TB, text string) *input.Case {
	t.Helper()
	c, violations, err := input.Decode([]byte(text), kind.Schema())
	if err != nil || len(violations) > 0 {
		t.Fatalf("no case: %v %v", err, violations)
	}
	return c
}

func mapFile(t testing.TB, name string) *input.Case {
	t.Helper()
	text, err := os.ReadFile("../../testdata/cases/" + name + ".json")
	if err != nil {
		t.Fatal(err)
	}
	return mapCase(t, string(text))
}

func mapOf(t testing.TB, c *input.Case, x, y string) *Map {
	t.Helper()
	m, violations, err := NewMap(context.Background(), c, mapAxis(t, c, x), mapAxis(t, c, y))
	if err != nil || len(violations) > 0 {
		t.Fatalf("no map: %v %v", err, violations)
	}
	return m
}

func mapAxis(t testing.TB, c *input.Case, text string) MapAxis {
	t.Helper()
	a, err := ParseMapAxis(c, text)
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// judgeAt judges the case of a map anew.
func judgeAt(m *Map, p Point) *spot {
	return newMapper(context.Background(), m.Case, m.X, m.Y).look(p)
}

// same reports whether two zones of different maps mean the same.
func same(a, b *Zone) bool { return reflect.DeepEqual(a, b) }

// On a small circle around each vertex of a border both its zones are found. Near a
// junction the circle is as large as the junction is uncertain.
func TestVerticesLieOnBorders(t *testing.T) {
	maps, vertices := 0, 0
	for i, m := range shippedMaps(t) {
		row := mapped[i]
		maps++
		for _, b := range m.Borders {
			for k, p := range b.Points {
				if !within(p.X) || !within(p.Y) {
					t.Fatalf("%s: %v is not on the map", row.file, p)
				}
				radius := 3 * Precise
				if k == 0 && b.Ends[0] || k == len(b.Points)-1 && b.Ends[1] {
					radius = 3 * Junction
				}
				left, right := around(m, p, radius, b.Left), around(m, p, radius, b.Right)
				if !left || !right {
					t.Errorf("%s: vertex %d of %d at %v: one side %t, the other %t", row.file, k, len(b.Points), p, left, right)
				}
				vertices++
			}
		}
	}
	if maps != len(mapped) || vertices < 250 {
		t.Errorf("%d maps, %d vertices", maps, vertices)
	}
}

// around reports whether a zone is found on a circle.
func around(m *Map, p Point, radius float64, z *Zone) bool {
	for k := range 16 {
		sin, cos := math.Sincos(math.Pi/8*float64(k) + 0.1)
		q := Point{p.X + radius*cos, p.Y + radius*sin}
		if within(q.X) && within(q.Y) && same(judgeAt(m, q).zone, z) {
			return true
		}
	}
	return false
}

// At a vertex of a line the utilisation of the assumption is 1; where it leaps, it
// is above on one side and not on the other.
func TestLinesAreUtilisationOne(t *testing.T) {
	vertices, leaps := 0, 0
	for i, m := range shippedMaps(t) {
		row := mapped[i]
		for _, l := range m.Lines {
			jumps := map[int]bool{}
			for _, k := range l.Leaps {
				jumps[k] = true
			}
			for k, p := range l.Points {
				if !jumps[k] {
					vertices++
					if u := math.Exp(judgeAt(m, p).load[l.Entry.Index()]); math.Abs(u-1) > 1e-6 {
						t.Errorf("%s: %s is used to %v at %v", row.file, l.Entry.ID, u, p)
					}
					continue
				}
				leaps++
				if !turnsAround(m, p, l.Entry.Index()) {
					t.Errorf("%s: %s does not leap at %v", row.file, l.Entry.ID, p)
				}
			}
		}
	}
	if vertices < 300 || leaps < 10 {
		t.Errorf("%d vertices, %d leaps", vertices, leaps)
	}
}

func turnsAround(m *Map, p Point, i int) bool {
	above, below := false, false
	for k := range 24 {
		sin, cos := math.Sincos(math.Pi/12*float64(k) + 0.05)
		q := Point{p.X + 2*Precise*cos, p.Y + 2*Precise*sin}
		if !within(q.X) || !within(q.Y) {
			continue
		}
		v := judgeAt(m, q).load[i]
		above, below = above || v > 0, below || !(v > 0)
	}
	return above && below
}

// The regions cover the map once, and what is judged inside one is its class.
func TestRegionsAreTheirClass(t *testing.T) {
	const margin = 3e-4
	ran := 0
	for i, m := range shippedMaps(t) {
		row := mapped[i]
		area := 0.0
		for _, r := range m.Regions {
			area += r.Area
		}
		if math.Abs(area-1) > 1e-6 {
			t.Errorf("%s: the regions cover %v of the map", row.file, area)
		}
		rapid.Check(t, func(t *rapid.T) {
			p := Point{rapid.Float64Range(0, 1).Draw(t, "x"), rapid.Float64Range(0, 1).Draw(t, "y")}
			if nearest(m.Borders, p) < margin || min(p.X, p.Y, 1-p.X, 1-p.Y) < 1e-9 {
				return
			}
			r := m.At(p)
			if r == nil {
				t.Fatalf("%s: %v is nowhere", row.file, p)
			}
			if z := judgeAt(m, p).zone; !same(z, r.Zone) {
				t.Fatalf("%s: at %v the map says %v, judged %v", row.file, p, name(r.Zone), name(z))
			}
		})
		ran++
	}
	if ran != len(mapped) {
		t.Errorf("ran %d rows", ran)
	}
}

func name(z *Zone) string {
	if z.Class != nil {
		return z.Class.ID
	}
	return "outside " + strings.Join(z.Outside, " ")
}

func nearest(borders []Border, p Point) float64 {
	least := math.Inf(1)
	for _, b := range borders {
		for i := 1; i < len(b.Points); i++ {
			least = min(least, toSegment(p, b.Points[i-1], b.Points[i]))
		}
		if b.Closed {
			least = min(least, toSegment(p, b.Points[len(b.Points)-1], b.Points[0]))
		}
	}
	return least
}

// stay is a cylinder in air on the plateau where the Strouhal number is 0.20.
const stay = `{"structure": {"kind": "cylinder", "diameter": "0.2 m", "length": "5 m", "mass_per_length": "20 kg/m", "frequency_dry": "3 Hz", "damping_ratio": 0.0005},
	"fluid": {"density": "1.2 kg/m3", "viscosity": "1.8e-5 Pa s", "sound_speed": "340 m/s", "phase": "gas"}, "flow": {"speed": "3 m/s", "direction": "cross"}}`

// Lock-in begins at U = f D/St: on logarithmic axes a line of slope 1, in speed
// against frequency.
func TestLockInBeginsOnAStraightLine(t *testing.T) {
	m := mapOf(t, mapCase(t, stay), "flow.speed=1..10 m/s:log", "structure.frequency_dry=0.5..20 Hz:log")
	points := 0
	for _, l := range m.Lines {
		if l.Entry != assumption.NoLockIn || len(l.Leaps) > 0 {
			continue
		}
		for i := 1; i < len(l.Points); i++ {
			a, b := l.Points[i-1], l.Points[i]
			if apart(a, b) < 1e-3 {
				continue
			}
			points++
			slope := math.Log(m.X.At(b.X)/m.X.At(a.X)) / math.Log(m.Y.At(b.Y)/m.Y.At(a.Y))
			if math.Abs(slope-1) > 1e-3 {
				t.Errorf("slope %.4f between %v m/s and %v m/s", slope, m.X.At(a.X), m.X.At(b.X))
			}
		}
	}
	if points == 0 {
		t.Fatal("no line of lock-in")
	}
}

// Bands far narrower than a cell of the net are found along their whole length: a
// cylinder in a wind that keeps its speed, over its frequency up to where nothing
// locks in. Judged point by point along some rows, the map has every band.
func TestNarrowBandsAreNotMissed(t *testing.T) {
	c := mapCase(t, strings.Replace(stay, `"flow": {"speed": "3 m/s"`, `"flow": {"operating": ["5 m/s", "5 m/s"]`, 1))
	m := mapOf(t, c, "structure.frequency_dry=0.2..60 Hz", "structure.mass_per_length=20..40 kg/m")
	narrowest, bands, points := math.Inf(1), 0, 0
	for k := range 9 {
		y := (float64(k) + 0.37) / 9
		begun, last := 0.0, (*Zone)(nil)
		for x := m.X.Position(0.6); x < m.X.Position(7); x += 2e-5 {
			p := Point{x, y}
			z := judgeAt(m, p).zone
			if last != nil && !same(z, last) {
				narrowest, begun, bands = min(narrowest, x-begun), x, bands+1
			}
			last = z
			points++
			if r := m.At(p); r == nil || !same(r.Zone, z) && nearest(m.Borders, p) > 5e-5 {
				t.Fatalf("row %v, %v Hz: judged %s, on the map another", y, m.X.At(x), name(z))
			}
		}
	}
	if narrowest > 0.1/steps || bands < 60 || points < 40000 {
		t.Errorf("the narrowest of %d bands is %.5f wide, a cell %.5f; %d points", bands, narrowest, 1.0/steps, points)
	}
}

// The same map comes from any number of cores, and of one judged again.
func TestMapIsTheSameOnAnyMachine(t *testing.T) {
	row := mapped[3]
	first := shippedMaps(t)[3]
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(1))
	again := mapOf(t, mapFile(t, row.file), row.x, row.y)
	if !reflect.DeepEqual(first.Regions, again.Regions) || !reflect.DeepEqual(first.Borders, again.Borders) || first.Judged != again.Judged {
		t.Error("two maps of one case differ")
	}
	for i := range first.Lines {
		if !reflect.DeepEqual(first.Lines[i].Points, again.Lines[i].Points) {
			t.Errorf("line %d differs", i)
		}
	}
}

func TestMapHonoursItsContext(t *testing.T) {
	c := mapFile(t, mapped[0].file)
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	m, _, err := NewMap(ctx, c, mapAxis(t, c, mapped[0].x), mapAxis(t, c, mapped[0].y))
	if m != nil || !errors.Is(err, context.Canceled) {
		t.Errorf("map %v, error %v", m, err)
	}
}

// Where an input is refused there is a region that names it; where it is refused
// everywhere the map is refused, with the reason.
func TestOutsideOfARange(t *testing.T) {
	m := shippedMaps(t)[2]
	outside := 0.0
	for _, r := range m.Regions {
		if r.Class == nil {
			outside += r.Area
			if !reflect.DeepEqual(r.Outside, []string{"surroundings.neighbour_spacing"}) {
				t.Errorf("refused: %v", r.Outside)
			}
		}
	}
	// The stays touch from a diameter of 0.3 m on.
	if want := math.Log(0.5/0.3) / math.Log(100); math.Abs(outside-want) > 1e-6 {
		t.Errorf("outside is %v of the map, want %v", outside, want)
	}
	c := mapFile(t, "outfall-span")
	_, violations, err := NewMap(context.Background(), c, mapAxis(t, c, "flow.speed=1..2 m/s"), mapAxis(t, c, "fluid.temperature=90..150 degC"))
	if err != nil || len(violations) == 0 || violations[0].Pointer != "/fluid/temperature" {
		t.Errorf("violations %v, error %v", violations, err)
	}
}

// Both ends of an interval may be axes: half of the map is then out of order.
func TestBothEndsOfAnInterval(t *testing.T) {
	c := mapFile(t, "outfall-span")
	m := mapOf(t, c, "flow.operating.0=0.1..2 m/s", "flow.operating.1=0.1..2 m/s")
	outside := 0.0
	for _, r := range m.Regions {
		if r.Class == nil {
			outside += r.Area
		}
	}
	if math.Abs(outside-0.5) > 1e-6 {
		t.Errorf("%v of the map is out of order, want half", outside)
	}
}

func TestParseMapAxis(t *testing.T) {
	c := mapFile(t, "outfall-span")
	rows := []struct {
		text     string
		from, to float64
		log      bool
		unit     string
	}{
		{"flow.speed=0.1..10 m/s:log", 0.1, 10, true, "m/s"},
		{"flow.speed=10..0.1 m/s", 0.1, 10, false, "m/s"},
		{"/flow/speed", 0.08231, 8.231, true, "kn"},
		{"fluid.temperature=5..30 degC", 278.15, 303.15, false, "degC"},
		{"structure.damping_ratio", 0.0005, 0.05, true, ""},
		{"structure.diameter = 100 mm .. 1 m : log", 0.1, 1, true, "m"},
	}
	for _, r := range rows {
		a := mapAxis(t, c, r.text)
		if math.Abs(a.From/r.from-1) > 1e-3 || math.Abs(a.To/r.to-1) > 1e-3 || a.Log != r.log || a.Unit != r.unit {
			t.Errorf("%s: %v to %v, log %t, in %q", r.text, a.From, a.To, a.Log, a.Unit)
		}
		for _, s := range []float64{0, 0.3, 1} {
			if got := a.Position(a.At(s)); math.Abs(got-s) > 1e-12 {
				t.Errorf("%s: position %v comes back as %v", r.text, s, got)
			}
		}
	}
	if len(rows) != 6 {
		t.Errorf("ran %d rows", len(rows))
	}
}

func TestMapAxesRefused(t *testing.T) {
	c := mapFile(t, "outfall-span")
	good := `{"input": "structure.length", "from": "5 m", "to": "50 m"}`
	rows := []struct{ x, y, pointer, code string }{
		{`{"input": "flow.sped", "from": "1 m/s", "to": "2 m/s"}`, good, "/x/input", "unknown-field"},
		{`{"input": "flow.speed", "from": "1 kg", "to": "2 m/s"}`, good, "/x/from", "wrong-dimension"},
		{`{"input": "flow.speed", "from": "1 m/s"}`, good, "/x/to", "missing"},
		{`{"input": "flow.speed", "from": "1 m/s", "to": "1 m/s"}`, good, "/x/to", "bad-range"},
		{`{"input": "flow.speed", "from": "0 m/s", "to": "1 m/s", "spacing": "log"}`, good, "/x/from", "out-of-range"},
		{`{"input": "flow.speed", "from": "-1 m/s", "to": "1 m/s"}`, good, "/x/from", "out-of-range"},
		{`{"input": "flow.speed", "from": "1 m/s", "to": "2 m/s", "spacing": "cubic"}`, good, "/x/spacing", "unknown-choice"},
		{`{"input": "flow.speed", "from": "1 m/s", "to": "2 m/s", "points": 7}`, good, "/x/points", "unknown-field"},
		{`{"input": "flow.speed", "frm": "1 m/s"}`, good, "/x/frm", "unknown-field"},
		{`{"input": "flow.speed", "input": "flow.speed"}`, good, "/x/input", "duplicate"},
		{`{"input": "fluid.name", "from": "1", "to": "2"}`, good, "/x/input", "wrong-kind"},
		{`{"input": "motion.amplitude"}`, good, "/x/from", "missing"},
		{`{"input": "fluid.temperature"}`, good, "/x/from", "missing"},
		{`{"from": "1 m/s"}`, good, "/x/input", "missing"},
		{`7`, good, "/x", "wrong-type"},
		{`"flow.speed=1..2 kg"`, good, "/x", "wrong-dimension"},
		{good, good, "/y", "contradiction"},
		{good, "", "/y", "missing"},
	}
	for _, r := range rows {
		var bad input.Violations
		var y jsontext.Value
		if r.y != "" {
			y = jsontext.Value(r.y)
		}
		ReadMapAxes(c, jsontext.Value(r.x), y, &bad)
		list := bad.List()
		if !slices.ContainsFunc(list, func(v input.Violation) bool { return v.Pointer == r.pointer && string(v.Code) == r.code }) {
			t.Errorf("x %s, y %s: %v, want %s at %s", r.x, r.y, list, r.code, r.pointer)
		}
	}
	if len(rows) != 18 {
		t.Errorf("ran %d rows", len(rows))
	}
	// Both axes are refused at once.
	var bad input.Violations
	ReadMapAxes(c, jsontext.Value(`{"input": "flow.sped"}`), jsontext.Value(`{"input": "structure.length", "from": "1 kg", "to": "2 s"}`), &bad)
	if len(bad.List()) != 3 {
		t.Errorf("%d violations, want 3", len(bad.List()))
	}
}

// The cloud has its 5 and 95 % where the distributions have them, and is the same in
// any units.
func TestCloud(t *testing.T) {
	with := func(speed string) *Map {
		c := mapCase(t, strings.Replace(stay, `"speed": "3 m/s"`, `"speed": "`+speed+`"`, 1))
		m := &Map{Case: c, X: mapAxis(t, c, "flow.speed=1..10 m/s:log"), Y: mapAxis(t, c, "structure.frequency_dry=0.5..20 Hz:log")}
		newMapper(context.Background(), c, m.X, m.Y).place(m)
		return m
	}
	if with("3 m/s").Cloud != nil {
		t.Error("a certain case has a cloud")
	}
	m := with("3 m/s +- 0.3 m/s")
	cloud := m.Cloud
	if q := cloud.Quantiles; math.Abs(q[0][0]-(3-1.6448536*0.3)) > 1e-6 || math.Abs(q[1][0]-(3+1.6448536*0.3)) > 1e-6 || q[0][1] != 3 || q[1][1] != 3 {
		t.Errorf("5 and 95 %% at %v", q)
	}
	inside := 0
	for _, p := range cloud.Points {
		if p.X >= cloud.Low.X && p.X <= cloud.High.X {
			inside++
		}
	}
	if len(cloud.Points) != cloud.Draws || math.Abs(float64(inside)/float64(cloud.Draws)-0.9) > 0.02 {
		t.Errorf("%d of %d draws between 5 and 95 %%", inside, cloud.Draws)
	}
	other := with("10.8 km/h +- 1.08 km/h").Cloud
	for i, p := range cloud.Points {
		if apart(p, other.Points[i]) > 1e-12 {
			t.Fatalf("draw %d depends on the unit", i)
		}
	}
	if uniform := with("2 .. 4 m/s").Cloud.Quantiles; math.Abs(uniform[0][0]-2.1) > 1e-9 || math.Abs(uniform[1][0]-3.9) > 1e-9 {
		t.Errorf("a range has 5 and 95 %% at %v", uniform)
	}
}

// A case of any kind can be mapped over inputs named alone: the regions cover the map,
// and hold what is judged at points of a coarse net shifted from the one it is made of.
func TestEveryKindHasAMap(t *testing.T) {
	rows := []struct{ file, x, y string }{
		{"race-liner", "flow.speed", "structure.length"}, {"roll-tank", "structure.length", "structure.width"},
		{"iced-feeder", "flow.speed", "structure.breadth"}, {"drift-buoy", "structure.diameter", "structure.draft"},
		{"weed-strip", "flow.speed", "structure.length"}, {"ferry-foil", "flow.speed", "structure.chord"},
		{"thrust-plate", "structure.radius", "structure.gap"}, {"flue-coils", "structure.diameter", "structure.wall_thickness"},
		{"dew-cantilever", "structure.length", "structure.width"}, {"wave-bar", "structure.diameter", "structure.length"},
		{"vent-disc", "structure.radius", "structure.thickness"}, {"lock-main", "flow.speed", "structure.inner_diameter"},
		{"camera-housing", "flow.speed", "structure.length"}, {"sampler-tube", "flow.speed", "structure.radius"},
	}
	kinds := map[string]bool{}
	for _, r := range rows {
		m := mapOf(t, mapFile(t, r.file), r.x, r.y)
		kinds[m.Case.Kind] = true
		area := 0.0
		for _, g := range m.Regions {
			area += g.Area
		}
		if math.Abs(area-1) > 1e-6 || m.Here == nil || m.Judged > 60_000 {
			t.Errorf("%s: the regions cover %v; the case at %v; judged %d times", r.file, area, m.Here, m.Judged)
		}
		for k := range 17 * 17 {
			p := Point{(float64(k%17) + 0.43) / 17, (float64(k/17) + 0.57) / 17}
			g := m.At(p)
			if z := judgeAt(m, p).zone; g == nil || !same(z, g.Zone) && nearest(m.Borders, p) > 3e-4 {
				t.Errorf("%s: at %v judged %s, on the map another", r.file, p, name(z))
			}
		}
	}
	if len(rows) != len(kind.All) || len(kinds) != len(kind.All) {
		t.Errorf("%d rows of %d kinds, there are %d", len(rows), len(kinds), len(kind.All))
	}
}
