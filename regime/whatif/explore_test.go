package whatif

import (
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"reflect"
	"runtime"
	"strings"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/regime/kind"
)

func exploringCase(t testing.TB, doc string) *input.Case {
	t.Helper()
	c, bad, err := input.Decode([]byte(doc), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("%s\n%v %+v", doc, err, bad)
	}
	return c
}

func exploring(t testing.TB, doc string) *regime.Answer {
	t.Helper()
	a, bad := regime.Classify(exploringCase(t, doc))
	if len(bad) > 0 {
		t.Fatalf("%s\n%+v", doc, bad)
	}
	if err := Explore(context.Background(), a); err != nil {
		t.Fatal(err)
	}
	return a
}

// shippedFile reads a case or a situation of testdata.
func shippedFile(t testing.TB, file string) string {
	t.Helper()
	text, err := os.ReadFile(filepath.Join("../../testdata", file))
	if err != nil {
		t.Fatal(err)
	}
	var situation struct{ Case json.RawMessage }
	if err := json.Unmarshal(text, &situation); err != nil {
		t.Fatal(err)
	}
	if situation.Case != nil {
		return string(situation.Case)
	}
	return string(text)
}

func turnOf(a *regime.Answer, path string, up bool) *regime.Turn {
	for i := range a.Turns {
		if a.Turns[i].Place.Path() == path && a.Turns[i].Up == up {
			return &a.Turns[i]
		}
	}
	return nil
}

func driverOf(a *regime.Answer, e *assumption.Entry, path string) float64 {
	for _, d := range a.Drivers[e.Index()] {
		if d.Place.Path() == path {
			return d.Sensitivity
		}
	}
	return 0
}

// What is found is the same however many inputs are worked on at once.
func TestExploreIsTheSameOnAnyMachine(t *testing.T) {
	rows := 0
	for _, file := range []string{"cases/signal-post.json", "cases/brine-tank.json", "published/tube-array-connors-one-row.json"} {
		doc := shippedFile(t, file)
		before := runtime.GOMAXPROCS(1)
		one := exploring(t, doc)
		runtime.GOMAXPROCS(7)
		many := exploring(t, doc)
		runtime.GOMAXPROCS(before)
		if fmt.Sprint(one.Turns) != fmt.Sprint(many.Turns) || !reflect.DeepEqual(one.Drivers, many.Drivers) {
			t.Errorf("%s: %v\n%v", file, one.Turns, many.Turns)
		}
		if len(one.Turns) == 0 || len(one.Drivers) != len(assumption.Catalogue) {
			t.Errorf("%s: %d turns, drivers of %d findings", file, len(one.Turns), len(one.Drivers))
		}
		rows++
	}
	if rows != 3 {
		t.Errorf("%d rows", rows)
	}
}

// ending is a context that ends itself after it was asked a number of times.
type ending struct {
	context.Context
	asked, after int
	cancel       context.CancelFunc
}

func (e *ending) Err() error {
	if e.asked++; e.asked == e.after {
		e.cancel()
	}
	return e.Context.Err()
}

// A context that ends stops the exploring, before it begins or in its middle, and
// leaves the answer as it was.
func TestExploreHonoursItsContext(t *testing.T) {
	defer runtime.GOMAXPROCS(runtime.GOMAXPROCS(1))
	c := exploringCase(t, shippedFile(t, "cases/signal-post.json"))
	rows := 0
	for _, after := range []int{1, 2, 3, 20, 200} {
		a, _ := regime.Classify(c)
		ctx, cancel := context.WithCancel(context.Background())
		e := &ending{Context: ctx, after: after, cancel: cancel}
		if err := Explore(e, a); !errors.Is(err, context.Canceled) || a.Turns != nil || a.Drivers != nil {
			t.Errorf("after %d: %v, %d turns", after, err, len(a.Turns))
		}
		if e.asked > after+60 {
			t.Errorf("after %d: asked %d times", after, e.asked)
		}
		rows++
	}
	if rows != 5 {
		t.Errorf("%d rows", rows)
	}
}

func TestExploreNeedsACase(t *testing.T) {
	r, _, _ := kind.Resolve(exploringCase(t, shippedFile(t, "cases/signal-post.json")))
	if err := Explore(context.Background(), regime.Decide(r, finding.Study{Tolerance: finding.Presets[0], Interest: finding.DefaultInterest})); err == nil {
		t.Error("no error")
	}
}

// Every number of every turn and driver is finite, but for the factor of a zero;
// turns come nearest first, drivers strongest first and no more than three; and
// the engine is asked some twenty times an input and direction.
func TestExploredNumbers(t *testing.T) {
	files, err := filepath.Glob("../../testdata/published/*.json")
	if err != nil {
		t.Fatal(err)
	}
	cases, legs, asked, turns, drivers := 0, 0, int64(0), 0, 0
	for _, file := range files {
		a, bad := regime.Classify(exploringCase(t, shippedFile(t, "published/"+filepath.Base(file))))
		if len(bad) > 0 {
			t.Fatal(file, bad)
		}
		x, err := newExplorer(context.Background(), a)
		if err != nil {
			t.Fatal(err)
		}
		found := make([]explored, len(x.routes))
		for i := range x.routes {
			found[i] = x.explore(&x.routes[i])
		}
		a.Drivers, a.Turns = x.driversOf(found), turnsOf(found)
		cases, legs, asked = cases+1, legs+2*len(x.routes), asked+x.judged.Load()
		turns += finiteTurns(t, file, a)
		drivers += finiteDrivers(t, file, a)
	}
	t.Logf("%d cases, %d legs, %d turns, %d drivers; %.1f judgements a leg", cases, legs, turns, drivers, float64(asked)/float64(legs))
	if cases != len(files) || cases < 80 || turns < 500 || drivers < 1000 {
		t.Errorf("only %d cases, %d turns, %d drivers", cases, turns, drivers)
	}
	if asked > 20*int64(legs) {
		t.Errorf("the engine was asked %d times for %d legs", asked, legs)
	}
}

func finiteTurns(t *testing.T, file string, a *regime.Answer) int {
	t.Helper()
	for i := range a.Turns {
		n := &a.Turns[i]
		if math.IsNaN(n.Value) || math.IsInf(n.Value, 0) || n.Class == nil || n.Class == a.Recommendation.Class {
			t.Errorf("%s: %+v", file, n)
		}
		if zero := placeValue(a.Case, n.Place) == 0; math.IsNaN(n.Factor) != zero || math.IsInf(n.Factor, 0) {
			t.Errorf("%s, %s: factor %v", file, n.Place.Path(), n.Factor)
		}
		if n.Factor > 0 && (n.Factor > 1) != n.Up && n.Value > 0 {
			t.Errorf("%s, %s: factor %v, up %v", file, n.Place.Path(), n.Factor, n.Up)
		}
		if i > 0 && distance(n.Factor) < distance(a.Turns[i-1].Factor)-1e-6 {
			t.Errorf("%s: turn %d is nearer than the one before", file, i)
		}
	}
	return len(a.Turns)
}

// placeValue is what a case has at a place, NaN where it was not given.
func placeValue(c *input.Case, p input.Place) float64 {
	if q := c.At(p); q != nil {
		return q.Value
	}
	return math.NaN()
}

func finiteDrivers(t *testing.T, file string, a *regime.Answer) int {
	t.Helper()
	n := 0
	for i, list := range a.Drivers {
		if len(list) > mostDrivers {
			t.Errorf("%s: %d drivers of %s", file, len(list), assumption.Catalogue[i].ID)
		}
		last := math.Inf(1)
		for _, d := range list {
			s := math.Abs(d.Sensitivity)
			if !(s >= leastDriver && s <= last+1e-6) || d.Place.Field.Of == "tolerance" {
				t.Errorf("%s, %s: %s %v after %v", file, assumption.Catalogue[i].ID, d.Place.Path(), d.Sensitivity, last)
			}
			last = s
			n++
		}
	}
	return n
}

// The same case in other units turns at the same values, by the same factors; and
// so does the case with all masses, lengths and times multiplied.
func TestExploreKnowsNoUnits(t *testing.T) {
	const si = `{"structure": {"kind": "cylinder", "diameter": "0.5 m", "length": "30 m", "mass_per_length": "60 kg/m", "frequency_dry": "1.5 Hz", "damping_ratio": 0.004, "roughness": "0 m"},
		"fluid": {"density": "1.2 kg/m3", "viscosity": "18 uPa s", "sound_speed": "340 m/s", "phase": "gas"}, "flow": {"speed": "4 m/s"}, "motion": {"amplitude": "0 m"},
		"surroundings": {"gravity": "9.81 m/s2", "ambient_pressure": "100 kPa"}}`
	const other = `{"structure": {"kind": "cylinder", "diameter": "50 cm", "length": "0.03 km", "mass_per_length": "600 g/cm", "frequency_dry": "90 rpm", "damping_ratio": "0.4 %", "roughness": "0 in"},
		"fluid": {"density": "0.0012 g/cm3", "viscosity": "0.018 cP", "sound_speed": "1224 km/h", "phase": "gas"}, "flow": {"speed": "14.4 km/h"}, "motion": {"amplitude": "0 ft"},
		"surroundings": {"gravity": "981 cm/s2", "ambient_pressure": "1 bar"}}`
	base := exploring(t, si)
	if len(base.Turns) < 8 {
		t.Fatalf("%d turns", len(base.Turns))
	}
	sameExploration(t, "other units", base, exploring(t, other), 1e-9)
	rows := 1
	for _, f := range [][3]float64{{3, 1.5, 1.5}, {0.4, 0.8, 0.7}, {1e-3, 0.1, 0.12}} {
		c := exploringCase(t, si)
		for _, p := range c.Places() {
			m, l, s := p.Kind().Exponents()
			c.Set(p, c.At(p).Value*math.Pow(f[0], float64(m))*math.Pow(f[1], float64(l))*math.Pow(f[2], float64(s)))
		}
		a, bad := regime.Classify(c)
		if len(bad) > 0 {
			t.Fatal(bad)
		}
		if err := Explore(context.Background(), a); err != nil {
			t.Fatal(err)
		}
		sameExploration(t, fmt.Sprint(f), base, a, 1e-6)
		rows++
	}
	if rows != 4 {
		t.Errorf("%d rows", rows)
	}
}

func sameExploration(t *testing.T, what string, a, b *regime.Answer, tolerance float64) {
	t.Helper()
	if len(a.Turns) != len(b.Turns) {
		t.Fatalf("%s: %d turns, not %d", what, len(b.Turns), len(a.Turns))
	}
	for i := range a.Turns {
		x := &a.Turns[i]
		y := turnOf(b, x.Place.Path(), x.Up)
		if y == nil || x.Entry != y.Entry || x.Class != y.Class || x.Verdict != y.Verdict || math.Abs(y.Factor/x.Factor-1) > tolerance {
			t.Errorf("%s: %+v, not %+v", what, y, x)
		}
	}
	for i := range a.Drivers {
		if len(a.Drivers[i]) != len(b.Drivers[i]) {
			t.Errorf("%s, %s: %v, not %v", what, assumption.Catalogue[i].ID, b.Drivers[i], a.Drivers[i])
			continue
		}
		for j, d := range a.Drivers[i] {
			if got := b.Drivers[i][j].Sensitivity; math.Abs(math.Abs(got)-math.Abs(d.Sensitivity)) > 1e-6*math.Max(1, math.Abs(got)) {
				t.Errorf("%s, %s: %v, not %v", what, assumption.Catalogue[i].ID, got, d.Sensitivity)
			}
		}
	}
}

// One-way coupling falls with every hazard that feeds on the motion, also where a
// wider factor makes another one that holds look worse.
func TestOneWayFallsWithEveryHazard(t *testing.T) {
	c := exploringCase(t, shippedFile(t, "cases/twin-stays.json"))
	damping, err := c.FindPlace("structure.damping_ratio")
	if err != nil {
		t.Fatal(err)
	}
	rows := 0
	for _, zeta := range []float64{2e-3, 5.45e-4, 5.3e-4, 4e-4} {
		c.Set(damping, zeta)
		a, bad := regime.Judge(c)
		if len(bad) > 0 {
			t.Fatal(bad)
		}
		if !a.Findings[assumption.NoWakeInterference.Index()].RulesOut() || !a.Findings[assumption.OneWay.Index()].RulesOut() {
			t.Errorf("ζ %v: wake interference %v, one-way %v", zeta, a.Findings[assumption.NoWakeInterference.Index()].Verdict, a.Findings[assumption.OneWay.Index()].Verdict)
		}
		rows++
	}
	if rows != 4 {
		t.Errorf("%d rows", rows)
	}
}

func BenchmarkExplore(b *testing.B) {
	for _, file := range []string{"cases/sign-box.json", "cases/signal-post.json", "cases/sluice-skin.json", "cases/survey-wing.json", "cases/quay-bridge.json", "cases/weed-strip.json", "cases/dosing-hose.json"} {
		b.Run(strings.TrimSuffix(filepath.Base(file), ".json"), func(b *testing.B) {
			c := exploringCase(b, shippedFile(b, file))
			speed := c.Places()[0]
			x := c.At(speed).Value
			for i := 0; b.Loop(); i++ {
				c.Set(speed, x*(1+1e-6*float64(i))) // lest the solved problems are remembered
				a, bad := regime.Classify(c)
				if len(bad) > 0 {
					b.Fatal(bad)
				}
				if err := Explore(context.Background(), a); err != nil {
					b.Fatal(err)
				}
				a.Release()
			}
		})
	}
}
