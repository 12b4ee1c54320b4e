package finding

import (
	"flag"
	"math"
	"os"
	"slices"
	"testing"

	"regimed/regime/group"
)

// TestMain fixes what rapid draws, so that a run is the same every time.
func TestMain(m *testing.M) {
	flag.Parse()
	own := map[string]bool{}
	flag.Visit(func(f *flag.Flag) { own[f.Name] = true })
	for name, value := range map[string]string{"rapid.seed": "20260302", "rapid.checks": "2000", "rapid.nofailfile": "true"} {
		if !own[name] {
			if err := flag.Set(name, value); err != nil {
				panic(err)
			}
		}
	}
	os.Exit(m.Run())
}

var say = Say("e {e}")

// concluded judges parts as one finding.
func concluded(interest Interest, parts ...Part) *Finding {
	x := NewContext(group.New(), Study{Tolerance: Presets[0], Interest: interest}, 1)
	f := &x.Made[0]
	x.Begin(f)
	for _, p := range parts {
		p.Say = say
		if p.Waits {
			x.Wait(p, group.Mach, func(v float64) float64 { return v })
			continue
		}
		x.Add(p)
	}
	x.Conclude()
	return f
}

func TestConclude(t *testing.T) {
	load := func(e, phi float64) Part { return Part{Measure: Load, Estimate: e, Factor: phi} } // limit 0.1
	frequency := func(e, phi float64) Part { return Part{Measure: Frequency, Estimate: e, Factor: phi} }
	response := func(e, phi float64) Part { return Part{Measure: Response, Estimate: e, Factor: phi} }
	waits := Part{Measure: Load, Factor: 1.5, Waits: true}
	rows := []struct {
		name      string
		interest  Interest
		parts     []Part
		verdict   Verdict
		governing int8
		rulesOut  bool
	}{
		{"nothing to estimate", DefaultInterest, nil, NotApplicable, -1, false},
		{"one valid part", DefaultInterest, []Part{load(0.01, 1.5)}, Valid, 0, false},
		{"the largest u·φ governs", DefaultInterest, []Part{load(0.05, 1.5), frequency(0.03, 1.5)}, Valid, 1, false}, // 0.75 and 0.9
		{"a wider factor governs", DefaultInterest, []Part{load(0.05, 1.15), load(0.04, 2)}, Valid, 1, false},
		{"one invalid is enough", DefaultInterest, []Part{load(0.01, 1.5), frequency(0.1, 1.5)}, Invalid, 1, true},
		{"an invalid one governs over a wider marginal one", DefaultInterest, []Part{load(0.29, 3), frequency(0.075, 1.15)}, Invalid, 1, true}, // u·φ 8.7 and 1.7
		{"not of interest does not count", DefaultInterest, []Part{load(0.01, 1.5), response(0.9, 1.15)}, Valid, 0, false},
		{"none of interest: judged, and rules out nothing", DefaultInterest, []Part{response(0.9, 1.15)}, Invalid, 0, false},
		{"switched on", DefaultInterest.With(Response), []Part{load(0.01, 1.5), response(0.9, 1.15)}, Invalid, 1, true},
		{"waits for a group", DefaultInterest, []Part{load(0.01, 1.5), waits}, Undetermined, 1, false},
		{"waits, but is invalid anyhow", DefaultInterest, []Part{waits, load(0.9, 1.5)}, Invalid, 1, true},
		{"marginal and waiting: undetermined", DefaultInterest, []Part{load(0.1, 1.5), waits}, Undetermined, 1, false},
		{"waits for what is not of interest", Interest(0).With(Frequency), []Part{waits, frequency(0.001, 1.5)}, Valid, 1, false},
		{"scale always counts", Interest(0), []Part{{Measure: Scale, Estimate: 3, Factor: 1.5}}, Invalid, 0, true},
		{"an own limit", DefaultInterest, []Part{{Measure: Load, Estimate: 0.9, Factor: 1, Limit: 1}}, Valid, 0, false},
		{"a square that overflows", DefaultInterest, []Part{load(math.Inf(1), 1.5)}, Invalid, 0, true},
	}
	for _, r := range rows {
		f := concluded(r.interest, r.parts...)
		if f.Verdict != r.verdict || f.Governing != r.governing || f.RulesOut() != r.rulesOut || len(f.Parts()) != len(r.parts) {
			t.Errorf("%s: %s, part %d governs, rules out: %v", r.name, f.Verdict, f.Governing, f.RulesOut())
		}
		if (f.Reason != nil) != (r.verdict == NotApplicable) {
			t.Errorf("%s: reason %v", r.name, f.Reason)
		}
		if u, ok := f.Utilisation(); ok != (f.Main() != nil && !f.Main().Waits) || ok && (u < 1e-6 || u > 1e6) {
			t.Errorf("%s: utilisation %g", r.name, u)
		}
		if needs := f.Needs(nil); slices.ContainsFunc(r.parts, func(p Part) bool { return p.Waits }) != slices.Equal(needs, []group.ID{group.Mach}) {
			t.Errorf("%s: needs %v", r.name, needs)
		}
	}
	if len(rows) != 16 {
		t.Errorf("%d rows", len(rows))
	}
}

// A waiting part says up to which value of the group the assumption would be valid.
func TestWaitHoldsToValid(t *testing.T) {
	x := NewContext(group.New(), Study{Tolerance: Presets[0], Interest: DefaultInterest}, 1)
	x.Begin(&x.Made[0])
	x.Set.Miss(group.Froude, group.Need{Input: "flow.speed", Unit: "m/s", Coefficient: 2, Power: 1})
	x.AddOrWait(Part{Measure: Load, Factor: 2, Say: say}, group.Froude, func(v float64) float64 { return v * v / 2 })
	x.Conclude()
	f := &x.Made[0]
	p := f.Main()
	want := math.Sqrt(2 * 0.1 / 2) // ½Fr² = 0.1/φ
	if f.Verdict != Undetermined || p == nil || math.Abs(p.Hold/want-1) > 1e-12 || p.Least {
		t.Fatalf("%s: %+v, want %g", f.Verdict, p, want)
	}
	if v := Judge(Utilisation(p.Hold*p.Hold/2, p.Limit), p.Factor, p.Inner); v != Valid {
		t.Errorf("at the value that holds the verdict is %s", v)
	}
	if u := x.Need(group.Froude).InputFor(p.Hold); math.Abs(u/(2*want)-1) > 1e-12 {
		t.Errorf("the speed that holds is %g, want %g", u, 2*want)
	}
}

func TestAddOrWaitByState(t *testing.T) {
	rows := 0
	for _, r := range []struct {
		state group.State
		parts int
		waits bool
	}{{group.Absent, 0, false}, {group.Known, 1, false}, {group.Adopted, 1, false}, {group.Missing, 1, true}} {
		rows++
		x := NewContext(group.New(), Study{Tolerance: Presets[0], Interest: DefaultInterest}, 1)
		switch r.state {
		case group.Known:
			x.Put(group.Mach, 0.2)
		case group.Adopted:
			x.Adopt(group.Mach, 0.2)
		case group.Missing:
			x.Miss(group.Mach, group.Need{Input: "fluid.sound_speed", Unit: "m/s"})
		}
		x.Begin(&x.Made[0])
		x.AddOrWait(Part{Measure: Load, Factor: 1.5, Say: say}, group.Mach, func(v float64) float64 { return v })
		x.Conclude()
		f := &x.Made[0]
		if len(f.Parts()) != r.parts || r.parts > 0 && f.Parts()[0].Waits != r.waits {
			t.Errorf("state %d: %+v", r.state, f.Parts())
		}
		if r.parts == 1 && !r.waits && f.Parts()[0].Estimate != 0.2 {
			t.Errorf("state %d: estimate %g", r.state, f.Parts()[0].Estimate)
		}
	}
	if rows != 4 {
		t.Errorf("%d rows", rows)
	}
}

// Sentences are taken apart into text and places, and put together again.
func TestSay(t *testing.T) {
	s := Say("At M = {mach} the load is off by {e:%}, {u} of {limit}, φ {phi}.")
	places := []Place{GroupValue, Estimate, UtilisationPlace, Limit, FactorPlace, None}
	if len(s.Segments) != len(places) {
		t.Fatalf("%d segments", len(s.Segments))
	}
	for i, p := range places {
		if s.Segments[i].Place != p {
			t.Errorf("place %d is %d, want %d", i, s.Segments[i].Place, p)
		}
	}
	if s.Segments[0].Group != group.Mach || s.Segments[0].Percent || !s.Segments[1].Percent || s.Segments[5].Text != "." {
		t.Errorf("%+v", s.Segments)
	}
	for _, bad := range []string{"{no_such_group}", "{mach"} {
		func() {
			defer func() {
				if recover() == nil {
					t.Errorf("%q is accepted", bad)
				}
			}()
			Say(bad)
		}()
	}
}
