package whatif

import (
	"context"
	"fmt"
	"math"
	"sync"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
)

// dense walks a leg in two thousand even steps and returns the first view of
// another class, with the last of the class of the case before it; nil where the
// class does not change before the leg is closed. back says how far on the class
// is that of the case again, +Inf where it is not.
func dense(w *walker, l *leg) (same, other *view, back float64) {
	const steps = 2000
	same, back = w.base, math.Inf(1)
	for i := 1; i <= steps; i++ {
		at := l.end() * float64(i) / steps
		if l.along == byOne {
			if at = float64(i); at > l.end() {
				break
			}
		}
		v := w.look(l, at)
		switch {
		case !v.open:
			return same, other, back
		case other == nil && v.class != w.base.class:
			other = v
		case other == nil:
			same = v
		case v.class == w.base.class:
			return same, other, at - same.at
		}
		if other != nil && at-other.at > longestFactor {
			return same, other, back
		}
	}
	return same, other, back
}

// denseCases are quick ones, of many kinds.
var denseCases = []string{
	"cases/sign-box.json", "cases/landing-pontoon.json", "cases/roll-tank.json", "cases/suction-tube.json", "cases/race-foil.json", "cases/sampler-tube.json",
	"cases/signal-post.json", "cases/louvre-blade.json", "published/cylinder-feng-1968.json", "published/generic-sphere-in-water.json",
}

// A walk of two thousand even steps finds no turn that is nearer, but for a class
// that comes and goes within a step of the walk; and these are few.
func TestNoNearerTurn(t *testing.T) {
	type leftOut struct{ file, path string }
	var mutex sync.Mutex
	var missed []leftOut
	legs, turns := 0, 0
	for _, file := range denseCases {
		a, bad := regime.Classify(exploringCase(t, shippedFile(t, file)))
		if len(bad) > 0 {
			t.Fatal(bad)
		}
		x, err := newExplorer(context.Background(), a)
		if err != nil {
			t.Fatal(err)
		}
		var all sync.WaitGroup
		for i := range x.routes {
			all.Go(func() {
				r := &x.routes[i]
				o := x.explore(r)
				for _, up := range []bool{false, true} {
					w := &walker{explorer: x, route: r, kase: x.kase.Clone()}
					l := r.leg(up)
					_, other, back := dense(w, l)
					mutex.Lock()
					legs++
					if other != nil {
						turns++
					}
					if other != nil && !reached(o.turns, l, other.at) {
						missed = append(missed, leftOut{file, r.place.Path()})
						if back > longestFactor {
							t.Errorf("%s, %s up %v: the class changes at %v", file, r.place.Path(), up, l.value(other.at))
						}
					}
					mutex.Unlock()
				}
			})
		}
		all.Wait()
	}
	t.Logf("%d legs of %d cases, %d turns, left out %v", legs, len(denseCases), turns, missed)
	if legs < 240 || turns < 90 || len(missed)*200 > legs {
		t.Errorf("%d legs, %d turns, %d left out", legs, turns, len(missed))
	}
}

// reached reports whether a turn of a leg lies no further than a place.
func reached(turns []regime.Turn, l *leg, at float64) bool {
	for i := range turns {
		if turns[i].Up == l.up {
			far := l.value(at)
			return l.up && turns[i].Value <= far || !l.up && turns[i].Value >= far
		}
	}
	return false
}

// A band narrower than a step is hit, wherever the steps fall: the second mode of
// a tank, whose resonance lasts for a few per cent of the frequency, and the gap
// between two modes of a cylinder in wind.
func TestTurnsAtNarrowBands(t *testing.T) {
	rows := 0
	for _, r := range []struct {
		file, path string
		up         bool
		entry      *assumption.Entry
		widest     float64
	}{
		{"published/tank-nasa-sp106-cylinder.json", "motion.frequency", true, assumption.LinearFreeSurface, 0.05},
		{"cases/brine-tank.json", "motion.frequency", true, assumption.LinearFreeSurface, 0.08},
		{"published/cylinder-feng-1968.json", "flow.speed", false, assumption.NoLockIn, 0.06},
	} {
		c := exploringCase(t, shippedFile(t, r.file))
		p, err := c.FindPlace(r.path)
		if err != nil {
			t.Fatal(err)
		}
		from := c.At(p).Value
		known := math.NaN()
		for _, f := range []float64{1, 0.97, 0.985, 1.01, 1.02, 1.035, 1.05, 1.07} {
			c.Set(p, from*f)
			a, bad := regime.Classify(c)
			if len(bad) > 0 {
				t.Fatal(bad)
			}
			if err := Explore(context.Background(), a); err != nil {
				t.Fatal(err)
			}
			n := turnOf(a, r.path, r.up)
			if n == nil || n.Entry != r.entry {
				t.Errorf("%s from %v: %+v", r.file, from*f, n)
				continue
			}
			if math.IsNaN(known) {
				known = n.Value
			}
			if math.Abs(n.Value/known-1) > 1e-9 {
				t.Errorf("%s from %v: %v, not %v", r.file, from*f, n.Value, known)
			}
			beyond := n.Value * math.Exp(r.widest*map[bool]float64{true: 1, false: -1}[r.up])
			c.Set(p, beyond)
			if b, _ := regime.Judge(c); b.Recommendation.Class != a.Recommendation.Class {
				t.Errorf("%s: at %v the class is not that of the case again", r.file, beyond)
			}
			rows++
		}
	}
	if rows != 24 {
		t.Errorf("%d rows", rows)
	}
}

// A zero is left by factors from a millionth of what is natural: damping that
// was given as none ends a lock-in.
func TestTurnsFromZero(t *testing.T) {
	const post = `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "length": "20 m", "mass_per_length": "80 kg/m", "frequency_dry": "3 Hz", "damping_ratio": %v},
		"fluid": "air", "flow": {"speed": "4.6 m/s"}}`
	zero := exploring(t, fmt.Sprintf(post, 0))
	n := turnOf(zero, "structure.damping_ratio", true)
	if n == nil || !math.IsNaN(n.Factor) || n.Verdict == finding.Invalid || !(n.Value > 1e-4 && n.Value < 0.2) {
		t.Fatalf("%+v", n)
	}
	little := exploring(t, fmt.Sprintf(post, n.Value/3))
	if m := turnOf(little, "structure.damping_ratio", true); m == nil || math.Abs(m.Value/n.Value-1) > 1e-9 || m.Class != n.Class {
		t.Errorf("%+v, from zero %+v", m, n)
	}
	if turnOf(zero, "structure.damping_ratio", false) != nil {
		t.Error("a turn below zero")
	}
}

// Whole numbers go by one.
func TestTurnsOfWholeNumbers(t *testing.T) {
	a := exploring(t, shippedFile(t, "cases/damper-membrane.json"))
	n := turnOf(a, "structure.wetted_sides", false)
	if n == nil || n.Value != 1 || n.Factor != 0.5 {
		t.Errorf("wetted sides: %+v", n)
	}
	const rod = `{"structure": {"kind": "cylinder", "diameter": "50 mm", "length": "12 m", "wall_thickness": "3 mm", "material": "steel", "support": "pinned-pinned", "damping_ratio": 0.003, "mode": %d},
		"fluid": "air", "flow": {"speed": "7 m/s"}}`
	rows, turned := 0, 0
	for mode := 1; mode <= 4; mode++ {
		a := exploring(t, fmt.Sprintf(rod, mode))
		for _, up := range []bool{false, true} {
			n := turnOf(a, "structure.mode", up)
			step := map[bool]int{false: -1, true: 1}[up]
			want := 0
			for m := mode + step; m >= 1 && m <= 100; m += step {
				b, _ := regime.Judge(exploringCase(t, fmt.Sprintf(rod, m)))
				if b.Recommendation.Class != a.Recommendation.Class {
					want = m
					break
				}
			}
			if (n == nil) != (want == 0) || n != nil && n.Value != float64(want) {
				t.Errorf("mode %d up %v: %+v, not %d", mode, up, n, want)
			}
			if n != nil {
				turned++
			}
			rows++
		}
	}
	if rows != 8 || turned == 0 {
		t.Errorf("%d rows, %d turns", rows, turned)
	}
}

// An angle goes through zero, and evenly there.
func TestTurnsOfAngles(t *testing.T) {
	a := exploring(t, shippedFile(t, "cases/survey-wing.json"))
	above, below := turnOf(a, "flow.incidence", true), turnOf(a, "flow.incidence", false)
	if above == nil || below == nil || !(below.Value < 0) || !(below.Factor < 0) || math.Abs(above.Value+below.Value) > 1e-8 {
		t.Errorf("%+v, %+v", above, below)
	}
	if d := distance(below.Factor); !math.IsInf(d, 1) {
		t.Errorf("a turn beyond zero is as near as %v", d)
	}
}

// The walk goes up to the edge of the range of a property, and looks at nothing
// beyond what is plausible.
func TestTurnsUpToTheEdge(t *testing.T) {
	a := exploring(t, shippedFile(t, "cases/header-tank.json"))
	n := turnOf(a, "fluid.temperature", true)
	if n == nil || n.Entry != assumption.NoCavitation || n.Value < 372 || n.Value > 373.15 {
		t.Errorf("water near its boiling point: %+v", n)
	}
	x, err := newExplorer(context.Background(), a)
	if err != nil {
		t.Fatal(err)
	}
	for i := range x.routes {
		if x.routes[i].place.Path() != "fluid.temperature" {
			continue
		}
		w := &walker{explorer: x, route: &x.routes[i], kase: x.kase.Clone()}
		p := &path{walker: w, leg: w.route.leg(false)}
		p.limit = p.leg.end()
		for p.begin(); !p.done(); {
			p.step()
		}
		edge := p.leg.value(p.last().at)
		if p.found || !p.shut || math.Abs(edge-273.15) > 0.01 {
			t.Errorf("downwards the walk ends at %v K", edge)
		}
	}
	if o := turnOf(exploring(t, stream), "structure.damping_ratio", true); o != nil && o.Value > 0.2 {
		t.Errorf("implausible: %+v", o)
	}
}

// A gauge pressure counts as the absolute one, and comes back as it was given.
func TestTurnsOfGaugePressure(t *testing.T) {
	a := exploring(t, shippedFile(t, "cases/lock-main.json"))
	n := turnOf(a, "fluid.pressure", true)
	if n == nil {
		t.Fatal("no turn")
	}
	ambient := 101325.0
	if p := a.Case.Lookup(a.Case.Schema.Block("surroundings").Find("ambient_pressure")); p != nil {
		ambient = p.Q.Value
	}
	if given := a.Case.At(n.Place); !given.Gauge || math.Abs(n.Factor-(n.Value+ambient)/(given.Value+ambient)) > 1e-12 {
		t.Errorf("%+v of %+v", n, given)
	}
}

// A field of one mode of several is an input like any other; the class turns
// where the worst mode makes it turn.
func TestTurnsOfAMode(t *testing.T) {
	const post = `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "length": "20 m", "mass_per_length": "80 kg/m",
		"modes": [{"frequency_dry": "9 Hz", "damping_ratio": 0.0005}, {"frequency_dry": "%v Hz", "damping_ratio": 0.0005}]}, "fluid": "air", "flow": {"speed": "4.6 m/s"}}`
	a := exploring(t, fmt.Sprintf(post, 12))
	n := turnOf(a, "structure.modes.1.frequency_dry", false)
	if n == nil || n.Entry == nil || n.Place.Pointer() != "/structure/modes/1/frequency_dry" {
		t.Fatalf("%+v of %v", n, a.Turns)
	}
	rows := 0
	for _, r := range []struct {
		f    float64
		same bool
	}{{n.Value * (1 + 1e-6), true}, {n.Value * (1 - 1e-6), false}} {
		b, _ := regime.Judge(exploringCase(t, fmt.Sprintf(post, r.f)))
		if (b.Recommendation.Class == a.Recommendation.Class) != r.same {
			t.Errorf("%v Hz: %s", r.f, b.Recommendation.Class.ID)
		}
		rows++
	}
	if rows != 2 {
		t.Errorf("%d rows", rows)
	}
	if d := a.Drivers[assumption.NoLockIn.Index()]; len(d) == 0 {
		t.Error("nothing drives the lock-in of the worst mode")
	}
}
