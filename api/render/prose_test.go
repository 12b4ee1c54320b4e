package render

import (
	"math"
	"strings"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

func because(a *regime.Answer, e *assumption.Entry) string {
	return string(appendBecause(nil, a, &a.Findings[e.Index()]))
}

// TestBecause holds sentences against the numbers that they must carry: the
// panel's added mass is 407/78.5 of its own, so that it slows by √(1 + 5.185).
func TestBecause(t *testing.T) {
	wet, riser := panel(t), riser(t)
	rows := []struct {
		got  string
		want string
	}{
		{because(wet, assumption.FluidAbsent), "Leaving the fluid out shifts the natural frequency by 149 %: the added mass is 5.18 of the dry mass; the limit is 5 %."},
		{because(wet, assumption.ExplicitCoupling), "; that is 10.4 times the limit of 0.5."},
		{because(wet, assumption.StillFluid), "There is no mean flow."},
		{because(wet, assumption.SmallDisplacement), "Not determined, since motion.amplitude is not given; it holds up to 4.116 mm."},
		{because(riser, assumption.InviscidFlow), "; by definition that counts as 100 %, and the limit is 10 %."},
		{because(riser, assumption.StillFluid), "The mean flow deflects the structure by 60 % of the amplitude of interest; the limit is 10 %."},
		{because(riser, assumption.CalibratedWake), ": 0.0252; the limit is 1. Above 2e5 take"},
	}
	for _, r := range rows {
		if !strings.Contains(r.got, r.want) {
			t.Errorf("got  %s\nwant %s", r.got, r.want)
		}
	}
	if len(rows) != 7 {
		t.Errorf("%d rows", len(rows))
	}
}

// TestHoldKeepsTheLimit puts the bound back into the estimate: at the amplitude
// that is named, the stretching of the edges costs the limit over the factor.
func TestHoldKeepsTheLimit(t *testing.T) {
	a := panel(t)
	f := &a.Findings[assumption.SmallDisplacement.Index()]
	list := holds(nil, a, f)
	if len(list) != 1 || list[0].input != "motion.amplitude" || list[0].unit != "m" || list[0].least {
		t.Fatalf("holds %+v", list)
	}
	w := list[0].value / 0.01
	e, p := math.Sqrt(1+a.Groups.Stiffening*w*w)-1, f.Main()
	if math.Abs(e*p.Factor/p.Limit-1) > 1e-9 {
		t.Errorf("at %v m the estimate is %v, the limit %v, the factor %v", list[0].value, e, p.Limit, p.Factor)
	}
}

func TestAddHoldKeepsTheHardest(t *testing.T) {
	var list []hold
	for _, h := range []hold{
		{input: "a", value: 2}, {input: "a", value: 1}, {input: "a", value: 3}, {input: "a", value: math.NaN()},
		{input: "a", value: 5, least: true}, {input: "a", value: 7, least: true}, {input: "b", value: math.NaN()}, {input: "b", value: 4},
	} {
		list = addHold(list, h)
	}
	if len(list) != 3 || list[0].value != 1 || list[1].value != 7 || list[2].value != 4 {
		t.Errorf("%+v", list)
	}
}

func TestLowerFirst(t *testing.T) {
	rows := map[string]string{
		"The flow is slow": "the flow is slow", "At M = 2 it is": "at M = 2 it is", "Re = 100": "Re = 100", "KC = 3": "KC = 3", "A circle": "a circle",
		"St U/(f_w D) comes": "St U/(f_w D) comes", "M times": "M times", "Young's modulus": "Young's modulus", "": "", "Locked in, it": "locked in, it",
		"It does not arise: x": "it does not arise: x",
	}
	for from, want := range rows {
		s := []byte(from)
		if lowerFirst(s); string(s) != want {
			t.Errorf("%q became %q, want %q", from, s, want)
		}
	}
	if len(rows) != 11 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestPercent(t *testing.T) {
	rows := map[float64]string{0: "0 %", 0.05: "5 %", 1.4869: "149 %", 0.0000123: "0.00123 %", 1e6: "over 10000 %"}
	for x, want := range rows {
		if got := string(appendPercent(nil, x)); got != want {
			t.Errorf("%v: %s, want %s", x, got, want)
		}
	}
	if len(rows) != 5 {
		t.Errorf("%d rows", len(rows))
	}
}

// TestDissent lets a criterion come to another verdict than the model.
func TestDissent(t *testing.T) {
	g := group.New()
	g.Traits = group.Fluid | group.Gas | group.Cross | group.Bluff | group.Circular
	g.Put(group.Strouhal, 0.2)
	g.Put(group.OperatingLow, 0)
	g.Put(group.OperatingHigh, 1)
	g.Modes.N, g.Modes.V[0] = 1, 5
	x := finding.NewContext(g, usual, 1)
	f := &x.Made[0]
	x.Begin(f)
	x.Add(finding.Part{Measure: finding.Stability, Estimate: 0.1, Limit: 1, Factor: 1.15, Say: finding.Say("The demand is {e}.")})
	x.Publish(criterion.All, "no-lock-in")
	x.Conclude()
	if len(f.Published()) < 2 {
		t.Fatalf("%d criteria", len(f.Published()))
	}
	a := &regime.Answer{Groups: g, Study: usual}
	got := string(appendBecause(nil, a, f))
	if !strings.HasPrefix(got, "The demand is 0.1; the limit is 1; but ") || !strings.Contains(got, "EN 1991-1-4 E.1.2 finds it invalid, at 1.25 times its limit") {
		t.Errorf("because %s", got)
	}
	checkSentence(t, got)
	if out := string(appendPublished([]byte{'{'}, f)); !strings.Contains(out, `"criterion":"en-1991-1-4"`) || !strings.Contains(out, `"verdict":"invalid","limit":1,"utilisation":1.25`) {
		t.Errorf("published %s", out)
	}
}

// TestUnknownNumbers leaves out what can't be said, and nothing else.
func TestUnknownNumbers(t *testing.T) {
	g := group.New()
	g.Put(group.Mach, 0.2)
	a := &regime.Answer{Groups: g, Study: usual}
	rows := map[string]string{
		"M is {mach}; Re is {reynolds}.":                            "M is 0.2.",
		"M is {mach}; Re is {reynolds} D; M is {mach:%} of 1.5 D.":  "M is 0.2; M is 20 % of 1.5 D.",
		"M is {mach}; Re is {reynolds} of 0.5 or {stokes}. Take M.": "M is 0.2. Take M.",
		"Re is {reynolds}; M is {mach}.":                            "Re is an unknown value; M is 0.2.",
		"Re is {reynolds} at most: the flow is slow, M = {mach}.":   "The flow is slow, M = 0.2.",
	}
	for from, want := range rows {
		if got := string(appendSaid(nil, a, finding.Say(from), nil)); got != want {
			t.Errorf("%s\ngot  %s\nwant %s", from, got, want)
		}
	}
	if len(rows) != 5 {
		t.Errorf("%d rows", len(rows))
	}
}

// TestHeldComesMostLoadedFirst also counts that nothing of the class is lost:
// what a class rests on is held, a condition, or cannot occur.
func TestHeldComesMostLoadedFirst(t *testing.T) {
	n := 0
	for name, a := range answers(t) {
		list := held(nil, a)
		for i := 1; i < len(list); i++ {
			n++
			if load(&a.Findings[list[i].Index()]) > load(&a.Findings[list[i-1].Index()]) {
				t.Errorf("%s: %s comes too late", name, list[i].ID)
			}
		}
		aside := 0
		for _, e := range a.Recommendation.Class.RestsOn {
			if !a.Findings[e.Index()].OfInterest {
				aside++
			}
		}
		if got := len(list) + len(moot(nil, a)) + len(a.Recommendation.Conditions) + aside; got != len(a.Recommendation.Class.RestsOn) {
			t.Errorf("%s: %d of %d assumptions accounted for", name, got, len(a.Recommendation.Class.RestsOn))
		}
	}
	if n < 4 {
		t.Errorf("only %d pairs", n)
	}
}

func TestGroupReasons(t *testing.T) {
	a := panel(t)
	rows := map[group.ID]string{
		group.Froude:                "It does not arise: the case has no speed of the flow.",
		group.DisplacementThickness: "motion.amplitude is not given.",
		group.Squeeze:               "It does not arise in this case.",
	}
	for id, want := range rows {
		if got := string(appendGroupReason(nil, a, id)); got != want {
			t.Errorf("%s: %s", group.Of(id).ID, got)
		}
	}
	a.Groups.Put(group.Mach, math.Inf(1))
	if got := string(appendGroupReason(nil, a, group.Mach)); !strings.Contains(got, "does not reach") {
		t.Errorf("out of range: %s", got)
	}
	a.Groups.Adopt(group.Mach, 0.9)
	if got := groupBand(a, group.Mach); got != "transonic" {
		t.Errorf("band %q", got)
	}
	if len(rows) != 3 {
		t.Errorf("%d rows", len(rows))
	}
}
