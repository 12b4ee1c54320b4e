package kind_test

import (
	"math"
	"strings"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
)

// atSurface classifies a case that must be right.
func atSurface(t *testing.T, text string) *regime.Answer {
	t.Helper()
	a, bad := surfaceCase(t, text)
	if len(bad) > 0 {
		t.Fatalf("%s is not accepted: %v", text, bad)
	}
	return a
}

func surfaceCase(t *testing.T, text string) (*regime.Answer, []input.Violation) {
	t.Helper()
	c, bad, err := input.Decode([]byte(text), kind.Schema())
	if err != nil {
		t.Fatal(err)
	}
	if len(bad) > 0 {
		return nil, bad
	}
	return regime.Classify(c)
}

// refusal is a case with the field at which it is refused.
type refusal struct{ text, pointer string }

func refuses(t *testing.T, rows []refusal) (ran int) {
	t.Helper()
	for _, r := range rows {
		_, bad := surfaceCase(t, r.text)
		if len(bad) == 0 || bad[0].Pointer != r.pointer {
			t.Errorf("%s: %v, want a violation at %s", r.text, bad, r.pointer)
		}
		ran++
	}
	return ran
}

// expected is an ordinary case: the class that an expert expects, and a group or
// a scale, worked by hand.
type expected struct {
	name, text, class string
	value             func(a *regime.Answer) float64
	want, tol         float64
}

func groupOf(id group.ID) func(*regime.Answer) float64 {
	return func(a *regime.Answer) float64 { return a.Groups.Get(id) }
}

func scaleOf(id scale.ID) func(*regime.Answer) float64 {
	return func(a *regime.Answer) float64 { return a.Scales.X(id) }
}

func runExpected(t *testing.T, rows []expected) {
	t.Helper()
	for _, r := range rows {
		t.Run(r.name, func(t *testing.T) {
			a := atSurface(t, r.text)
			if got := a.Recommendation.Class.ID; got != r.class {
				t.Errorf("class %s, want %s", got, r.class)
			}
			if x := r.value(a); !(math.Abs(x/r.want-1) <= r.tol) {
				t.Errorf("%.6g, want %.6g within %g", x, r.want, r.tol)
			}
		})
	}
}

const (
	steelTank = `{"structure":{"kind":"tank","radius":"10 m","liquid_depth":"10 m","wall_thickness":"10 mm","material":"steel","spectral_acceleration":"0.5 m/s2","freeboard":"1.5 m"},"fluid":"water"}`
	bareTank  = `{"structure":{"kind":"tank","radius":"1 m","liquid_depth":"2 m"},"fluid":"water"}`
	softTank  = `{"structure":{"kind":"tank","length":"2 m","width":"2 m","liquid_depth":"1 m","height":"1.2 m","wall_thickness":"6 mm","young_modulus":"4 MPa","density":"1100 kg/m3"},"fluid":"water","motion":{"frequency":"0.2 Hz","amplitude":"2 mm"}}`
	shaken    = `{"structure":{"kind":"tank","length":"0.9 m","width":"62 mm","liquid_depth":"93 mm","height":"508 mm","wall_thickness":"10 mm","material":"pvc"},"fluid":"water","motion":{"frequency":"0.5211 Hz","amplitude":"20 mm"}}`
)

func TestOrdinaryTanks(t *testing.T) {
	runExpected(t, []expected{
		// 2 tanh(1.841)/(1.841·2.390), the share of the first mode at h = R
		{"storage tank under an earthquake", steelTank, "sloshing", groupOf(group.ConvectiveMass), 0.4322, 0.001},
		// 6.36·10 √(998/210e9)/√(0.01/10): 0.139 s
		{"the same: impulsive period", steelTank, "sloshing", scaleOf(scale.FrequencyWet), 1 / 0.1386, 0.002},
		// 0.8368 R Sa/g
		{"the same: wave at the wall", steelTank, "sloshing", scaleOf(scale.SloshingHeight), 0.8368 * 10 * 0.5 / 9.80665, 0.001},
		// Abramson: ω² = (1.841 g/a) tanh(1.841 h/a)
		{"the frequency of a tank of which no more is known", bareTank, "sloshing", scaleOf(scale.FrequencySlosh), 0.67594, 0.001},
		{"a tank of rubber sheet", softTank, "hydroelastic-sloshing", groupOf(group.ConvectiveMass), 8 * math.Tanh(math.Pi/2) / (math.Pow(math.Pi, 3) * 0.5), 1e-6},
		// resonance in a shallow tank of 0.9 m: T₁ = 1.919 s
		{"a shallow tank shaken at its first mode", shaken, "unsteady-load", scaleOf(scale.FrequencySlosh), 1 / 1.919, 0.002},
	})
}

// verdictRow is a case and the verdict on an assumption.
type verdictRow struct {
	name, text string
	entry      *assumption.Entry
	want       finding.Verdict
}

func runVerdicts(t *testing.T, rows []verdictRow) {
	t.Helper()
	for _, r := range rows {
		t.Run(r.name, func(t *testing.T) {
			a := atSurface(t, r.text)
			if got := a.Findings[r.entry.Index()].Verdict; got != r.want {
				t.Errorf("%s is %s, want %s: %+v", r.entry.ID, got, r.want, a.Findings[r.entry.Index()].Parts())
			}
		})
	}
}

func with(text, old, other string) string {
	if !strings.Contains(text, old) {
		panic(old + " is not in " + text)
	}
	return strings.Replace(text, old, other, 1)
}

// Hazards and limits of tanks, on each side of their onset.
func TestTankHazards(t *testing.T) {
	runVerdicts(t, []verdictRow{
		{"shaken at the first mode", shaken, assumption.NoSloshingResonance, finding.Invalid},
		{"shaken at a third of it", with(shaken, "0.5211 Hz", "0.17 Hz"), assumption.NoSloshingResonance, finding.Valid},
		{"shaken at half of it", with(shaken, "0.5211 Hz", "0.26 Hz"), assumption.NoSloshingResonance, finding.Valid},
		{"shaken at the third mode", with(shaken, "0.5211 Hz", "1.4 Hz"), assumption.NoSloshingResonance, finding.Invalid},
		{"no frequency given", with(shaken, `"frequency":"0.5211 Hz",`, ""), assumption.NoSloshingResonance, finding.Undetermined},
		{"an earthquake holds its resonance", steelTank, assumption.NoSloshingResonance, finding.NotApplicable},
		{"a wave above the freeboard", with(steelTank, "1.5 m", "0.3 m"), assumption.NoSlamming, finding.Invalid},
		{"a wave at the freeboard", with(steelTank, "1.5 m", "0.42 m"), assumption.NoSlamming, finding.Marginal},
		{"a wave below the freeboard", steelTank, assumption.NoSlamming, finding.Valid},
		{"an open tank", with(steelTank, `,"freeboard":"1.5 m"`, ""), assumption.NoSlamming, finding.NotApplicable},
		{"a small wave", steelTank, assumption.LinearFreeSurface, finding.Valid},
		{"a wave past the linear range", with(steelTank, "0.5 m/s2", "4 m/s2"), assumption.LinearFreeSurface, finding.Invalid},
		{"a wave of half the range in a shallow tank", with(with(shaken, "0.5211 Hz", "0.17 Hz"), "20 mm", "120 mm"), assumption.LinearFreeSurface, finding.Marginal},
		{"stiff walls", steelTank, assumption.RigidWalls, finding.Valid},
		{"soft walls", softTank, assumption.RigidWalls, finding.Invalid},
		{"walls of which nothing is known", bareTank, assumption.RigidWalls, finding.Undetermined},
		{"the liquid in a stiff tank", steelTank, assumption.FreeSurfaceAbsent, finding.Invalid},
		{"a tall tank sloshes little", with(steelTank, `"liquid_depth":"10 m"`, `"liquid_depth":"80 m"`), assumption.FreeSurfaceAbsent, finding.Valid},
	})
}

// An undetermined finding names the input that would settle it.
func TestTankAsksForWhatIsMissing(t *testing.T) {
	a := atSurface(t, bareTank)
	ran := 0
	for _, row := range []struct {
		entry *assumption.Entry
		input string
	}{
		{assumption.RigidWalls, "structure.wall_thickness"},
		{assumption.LinearFreeSurface, "motion.frequency"},
		{assumption.NoSloshingResonance, "motion.frequency"},
	} {
		needs := a.Findings[row.entry.Index()].Needs(nil)
		if len(needs) == 0 || a.Groups.Need(needs[0]).Input != row.input {
			t.Errorf("%s waits for %v, want %s", row.entry.ID, needs, row.input)
		}
		ran++
	}
	if ran != 3 {
		t.Errorf("ran %d rows", ran)
	}
}

// What API 650 says stands beside the physical model.
func TestTankStandards(t *testing.T) {
	a := atSurface(t, steelTank)
	want := map[string]float64{
		"api-650-e-convective": 0.230 / 0.5 * math.Tanh(3.67*0.5) / 0.1, // of the tolerance of load
		"api-650-e-freeboard":  0.42 * 20 * 0.5 / 9.80665 / 1.5,
	}
	for i := range a.Findings {
		for _, p := range a.Findings[i].Published() {
			x, ok := want[p.Criterion.ID]
			if !ok {
				t.Errorf("unexpected %s", p.Criterion.ID)
			}
			if math.Abs(p.Utilisation/x-1) > 0.002 {
				t.Errorf("%s: %g, want %g", p.Criterion.ID, p.Utilisation, x)
			}
			delete(want, p.Criterion.ID)
		}
	}
	if len(want) > 0 {
		t.Errorf("missing %v", want)
	}
}

// Cases that contradict themselves are refused at the field.
func TestTankContradictions(t *testing.T) {
	rows := []refusal{
		{with(steelTank, `"liquid_depth":"10 m"`, `"liquid_depth":"10 m","height":"9 m"`), "/structure/liquid_depth"},
		{with(steelTank, `"fluid":"water"`, `"fluid":"water","flow":{"speed":"1 m/s"}`), "/flow/speed"},
		{with(steelTank, `"fluid":"water"`, `"fluid":"water","waves":{"height":"1 m","period":"5 s"}`), "/waves/height"},
		{with(steelTank, `"fluid":"water"`, `"fluid":"air"`), "/fluid/phase"},
		{with(steelTank, `"radius":"10 m"`, `"radius":"10 m","diameter":"19 m"`), "/structure/radius"},
		{with(steelTank, `"radius":"10 m",`, ""), "/structure/length"},
		{with(steelTank, `"liquid_depth":"10 m",`, ""), "/structure/liquid_depth"},
		{with(steelTank, `"fluid":"water"`, `"fluid":"water","motion":{"frequency":"1 Hz"}`), "/structure/spectral_acceleration"},
		{with(shaken, `"kind":"tank"`, `"kind":"tank","base_acceleration":"3 m/s2"`), "/structure/base_acceleration"},
	}
	if ran := refuses(t, rows); ran != 9 {
		t.Errorf("ran %d rows", ran)
	}
}

// A wave that slams against a roof is no linear surface, whatever linear theory
// makes of its height.
func TestSlammingSurface(t *testing.T) {
	a := answerOf(t, `{"structure":{"kind":"tank","diameter":"36.6 m","height":"14.6 m","liquid_depth":"13.4 m","wall_thickness":"15 mm","material":"steel","spectral_acceleration":"0.12 gn"},
		"fluid":{"density":"870 kg/m3","viscosity":"10 mPa s","sound_speed":"1350 m/s","phase":"liquid"}}`)
	if v := a.Findings[assumption.NoSlamming.Index()].Verdict; v != finding.Invalid {
		t.Fatalf("no-slamming %s", v)
	}
	if v := a.Findings[assumption.LinearFreeSurface.Index()].Verdict; v == finding.Invalid {
		t.Fatalf("linear-free-surface %s: the case decides nothing", v)
	}
	if s := a.Recommendation.Axes.FreeSurface; s != "nonlinear" {
		t.Errorf("free surface %s", s)
	}
}
