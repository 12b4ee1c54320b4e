package regime_test

import (
	"math"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
)

// answer classifies a case that must be right.
func answer(t testing.TB, text string) *regime.Answer {
	t.Helper()
	c, violations, err := input.Decode([]byte(text), kind.Schema())
	if err != nil || len(violations) > 0 {
		t.Fatalf("case is not accepted: %v %v", err, violations)
	}
	a, violations := regime.Classify(c)
	if len(violations) > 0 {
		t.Fatalf("case is not accepted: %v", violations)
	}
	return a
}

// estimateOf returns the largest estimate of a measure in a finding.
func estimateOf(a *regime.Answer, e *assumption.Entry, m finding.Measure) float64 {
	x := math.NaN()
	for _, p := range a.Findings[e.Index()].Parts() {
		if p.Measure == m && !p.Waits && !(x >= p.Estimate) {
			x = p.Estimate
		}
	}
	return x
}

// ordinary is a case with the class that an expert expects and the price that
// decides.
type ordinary struct {
	name, text, class string
	price             func(*regime.Answer) float64
	want, tol         float64
}

// of is the price that is a group.
func of(id group.ID) func(*regime.Answer) float64 {
	return func(a *regime.Answer) float64 { return a.Groups.Get(id) }
}

func runOrdinary(t *testing.T, rows []ordinary) (ran int) {
	for _, r := range rows {
		t.Run(r.name, func(t *testing.T) {
			a := answer(t, r.text)
			if got := a.Recommendation.Class.ID; got != r.class {
				t.Errorf("class %s, want %s; ruled out: %s", got, r.class, fallen(a))
			}
			if x := r.price(a); !(math.Abs(x/r.want-1) <= r.tol) {
				t.Errorf("deciding price %.4g, want %.4g within %.0f %%", x, r.want, 100*r.tol)
			}
		})
		ran++
	}
	return ran
}

// Ordinary cases: the class that an expert of the sub-field expects, and the
// price that decides. The numbers are worked by hand from the formulas named.
func TestOrdinaryCases(t *testing.T) {
	absent := func(a *regime.Answer) float64 { return estimateOf(a, assumption.FluidAbsent, finding.Frequency) }
	const panel = `"structure":{"kind":"plate","length":"1 m","width":"1 m","thickness":"10 mm","material":"steel","edges":"SSSS","wetted_sides":1}`
	const chimney = `"structure":{"kind":"cylinder","diameter":"2 m","length":"40 m","wall_thickness":"9.7 mm","mass_per_length":"477 kg/m","damping_ratio":"0.5 %","support":"clamped-free","frequency_dry":"0.8 Hz"},"fluid":"air"`
	const thermowell = `"structure":{"kind":"cylinder","diameter":"25 mm","length":"%","wall_thickness":"9 mm","material":"stainless-steel","support":"clamped-free","damping_ratio":"0.05 %","strouhal":0.22},"fluid":{"density":"12 kg/m3","viscosity":"0.02 mPa s","sound_speed":"600 m/s","pressure":"30 bar","phase":"gas"}`
	const riser = `"structure":{"kind":"cylinder","diameter":"0.3 m","length":"60 m","mass_per_length":"144.9 kg/m","damping_ratio":"0.5 %","support":"taut","tension":"200 kN","strouhal":0.2},"fluid":"seawater"`
	const hose = `"structure":{"kind":"cylinder","diameter":"16 mm","length":"%","material":"rubber","support":"clamped-clamped"},"fluid":"water"`
	rows := []ordinary{
		// ½·0.4095·1.204/78.5
		{"steel panel in air", `{` + panel + `,"fluid":"air"}`, "dry-structure", absent, 0.0031, 0.05},
		// √(1 + 0.4095·998.2/78.5) − 1
		{"steel panel, one side in water", `{` + panel + `,"fluid":"water"}`, "added-mass", absent, math.Sqrt(1+0.409496*998.2/78.5) - 1, 0.002},
		// k₀/k_b at the wet frequency: 2π·19.6/1482/(π√2)
		{"the same: subsonic bending wave", `{` + panel + `,"fluid":"water"}`, "added-mass",
			func(a *regime.Answer) float64 {
				return math.Sqrt(a.Groups.Get(group.CoincidenceRatio) * a.Groups.Get(group.FrequencyRatio))
			}, 0.0188, 0.03},
		{"silicon cantilever in water", `{"structure":{"kind":"plate","length":"397 um","width":"29 um","thickness":"2 um","material":"silicon","edges":"CFFF"},"fluid":"water"}`,
			"viscous-added-mass", of(group.Stokes), 8, 0.25},
		{"silicon plate over a film of air", `{"structure":{"kind":"plate","length":"0.5 mm","width":"0.5 mm","thickness":"5 um","material":"silicon","edges":"CCCC","frequency_dry":"10 kHz"},"fluid":"air","motion":{"frequency":"10 kHz"},"surroundings":{"wall_gap":"2 um"}}`,
			"thin-film", of(group.Knudsen), 0.034, 0.08},
		{"the same: squeeze number", `{"structure":{"kind":"plate","length":"0.5 mm","width":"0.5 mm","thickness":"5 um","material":"silicon","edges":"CCCC","frequency_dry":"10 kHz"},"fluid":"air","motion":{"frequency":"10 kHz"},"surroundings":{"wall_gap":"2 um"}}`,
			"thin-film", of(group.Squeeze), 8.3 / 1.20, 0.05}, // 12ηωL²/(pg²) with η/(1 + 9.638 Kn^1.159)
		{"steel chimney in wind to 25 m/s", `{` + chimney + `,"flow":{"speed":"25 m/s"}}`, "wake-model", of(group.Scruton), 6, 0.03},
		{"the same: amplitude of a cantilever", `{` + chimney + `,"flow":{"speed":"25 m/s"}}`, "wake-model", of(group.VortexAmplitude), 0.24 * 1.305, 0.45},
		{"thermowell in steam, f_v/f_w 0.40", `{` + replace(thermowell, "250 mm") + `,"flow":{"speed":"13 m/s"}}`, "dry-structure", of(group.SheddingRatio), 0.40, 0.05},
		{"a thermowell that the drag bends", `{` + replace(thermowell, "850 mm") + `,"flow":{"operating":["0 m/s","0.85 m/s"],"speed":"0.85 m/s"},"motion":{"amplitude":"0.001 mm"}}`, "steady-load", of(group.SheddingRatio), 0.30, 0.15},
		{"riser in a current", `{` + riser + `,"flow":{"speed":"1 m/s"}}`, "wake-model", of(group.WakeBandLow), 0.67, 0.02},
		{"the same: upper edge", `{` + riser + `,"flow":{"speed":"1 m/s"}}`, "wake-model", of(group.WakeBandHigh), 1.97, 0.03},
		{"hose along a slow stream: stable", `{` + replace(hose, "0.5 m") + `,"flow":{"speed":"1 m/s","direction":"axial"}}`, "conveying-beam", of(group.BucklingSpeed), hoseSpeed(0.5), 0.01},
		{"hose along a stream: buckled", `{` + replace(hose, "2 m") + `,"flow":{"speed":"1 m/s","direction":"axial"}}`, "conveying-beam", of(group.BucklingSpeed), hoseSpeed(2), 0.01},
		{"tube with contents in still oil", `{"structure":{"kind":"cylinder","diameter":"60.3 mm","length":"4 m","wall_thickness":"3.9 mm","material":"steel","support":"clamped-clamped","contents_density":"870 kg/m3"},"fluid":{"density":"870 kg/m3","viscosity":"20 mPa s","sound_speed":"1300 m/s","vapour_pressure":"10 Pa"}}`,
			"added-mass", absent, math.Sqrt(1+(870*2855.8e-6+870*2164.8e-6)/(7850*691e-6)) - 1, 0.05},
	}
	if ran := runOrdinary(t, rows); ran != 15 {
		t.Errorf("ran %d ordinary cases", ran)
	}
}

// hoseSpeed is u/2π of the hose at 1 m/s: a solid rubber rod of 16 mm, E 2 MPa.
func hoseSpeed(length float64) float64 {
	const d, young, rho = 0.016, 2e6, 998.2
	added := rho * math.Pi * d * d / 4
	bending := young * math.Pi * math.Pow(d, 4) / 64
	return length * math.Sqrt(added/bending) / (2 * math.Pi)
}

func replace(text, length string) string {
	out := ""
	for i := range text {
		if text[i] == '%' && i > 0 && text[i-1] == '"' {
			out += length
			continue
		}
		out += text[i : i+1]
	}
	return out
}

func fallen(a *regime.Answer) string {
	s := ""
	for _, r := range a.Recommendation.Rejected {
		s += r.Class.ID + " by"
		for _, e := range r.Because {
			s += " " + e.ID
		}
		s += "; "
	}
	return s
}

// Every class of the ladder has a title and says what it solves, and the last
// rests on nothing.
func TestLadderRows(t *testing.T) {
	rank := 0
	for i := range ladder.Classes {
		c := &ladder.Classes[i]
		if c.Title == "" || c.Solves == "" || c.Rank < rank {
			t.Errorf("class %q lacks a title, or stands below its rank", c.ID)
		}
		rank = c.Rank
	}
	if n := len(ladder.Classes[len(ladder.Classes)-1].RestsOn); n != 0 {
		t.Errorf("the dearest class rests on %d assumptions", n)
	}
}
