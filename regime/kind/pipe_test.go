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

// answer classifies a case that must be right.
func answerOf(t *testing.T, text string) *regime.Answer {
	t.Helper()
	c, bad, err := input.Decode([]byte(text), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("case is not accepted: %v %v", err, bad)
	}
	a, bad := regime.Classify(c)
	if len(bad) > 0 {
		t.Fatalf("case is not accepted: %v", bad)
	}
	return a
}

func refusalOf(t *testing.T, text string) string {
	t.Helper()
	c, bad, err := input.Decode([]byte(text), kind.Schema())
	if err != nil {
		t.Fatal(err)
	}
	if len(bad) == 0 {
		_, bad = regime.Classify(c)
	}
	var s []string
	for _, v := range bad {
		s = append(s, v.Pointer+" "+string(v.Code))
	}
	return strings.Join(s, ", ")
}

func verdictOf(a *regime.Answer, e *assumption.Entry) finding.Verdict {
	return a.Findings[e.Index()].Verdict
}

func closeTo(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol*math.Abs(want)) {
		t.Errorf("%s = %.6g, want %.6g within %g", what, got, want, tol)
	}
}

const hose = `{"structure":{"kind":"pipe","inner_diameter":"13 mm","wall_thickness":"2.5 mm","length":"%","density":"1227 kg/m3","young_modulus":"5 MPa","poisson_ratio":0.45,"linear_strain":0.2,"support":"clamped-free","speed_change":"0 m/s"},
	"fluid":{"density":"998 kg/m3","viscosity":"1 mPa s","sound_speed":"1480 m/s","phase":"liquid","vapour_pressure":"2.3 kPa"},"flow":{"speed":"3 m/s"},"motion":{"amplitude":"2 mm"}}`

// The garden hose with a free end: M = 0.1325 kg/m, m = 0.1494 kg/m, so β 0.47;
// EI = 5e6·3.751e-9; u = 3ℓ√(M/EI) = 4.0 and 16; the onset is at 9.2 (interpolated
// between 9.32 at β 0.5 and 8.78 at 0.4).
func TestGardenHose(t *testing.T) {
	short, long := answerOf(t, strings.Replace(hose, "%", "0.5 m", 1)), answerOf(t, strings.Replace(hose, "%", "2 m", 1))
	for _, a := range []*regime.Answer{short, long} {
		if c := a.Recommendation.Class.ID; c != "conveying-beam" {
			t.Errorf("class %s, want conveying-beam", c)
		}
		closeTo(t, "β", a.Groups.Get(group.ConveyingMass), 0.47, 0.005)
	}
	closeTo(t, "u of 0.5 m", short.Groups.Get(group.ConveyingSpeed), 4.0, 0.01)
	closeTo(t, "u of 2 m", long.Groups.Get(group.ConveyingSpeed), 16, 0.01)
	closeTo(t, "onset", short.Groups.Get(group.ConveyingSpeed)/short.Groups.Get(group.FlutterSpeed), 9.2, 0.01)
	if v := verdictOf(short, assumption.NoFlutter); v != finding.Valid {
		t.Errorf("the short hose: no-flutter %s", v)
	}
	if v := verdictOf(long, assumption.NoFlutter); v != finding.Invalid {
		t.Errorf("the long hose: no-flutter %s", v)
	}
	if v := verdictOf(short, assumption.PlugFlow); v != finding.Valid {
		t.Errorf("plug-flow %s of a turbulent flow", v)
	}
}

// A pipeline with slow oil at 1.5 % of its buckling speed: the fluid is mass and
// nothing else. Frequency shift ½(u/π)² = 1.1e-4.
func TestSlowOil(t *testing.T) {
	a := answerOf(t, `{"structure":{"kind":"pipe","inner_diameter":"0.744 m","wall_thickness":"8 mm","length":"20 m","density":"7850 kg/m3","young_modulus":"207 GPa","linear_strain":0.001,"speed_change":"0 m/s"},
		"fluid":{"density":"860 kg/m3","viscosity":"10 mPa s","sound_speed":"1300 m/s","phase":"liquid","vapour_pressure":"1 kPa"},"flow":{"speed":"2 m/s"},"motion":{"amplitude":"1 mm"}}`)
	if c := a.Recommendation.Class.ID; c != "added-mass" {
		t.Errorf("class %s, want added-mass", c)
	}
	closeTo(t, "u", a.Groups.Get(group.ConveyingSpeed), 0.0465, 0.01)
	closeTo(t, "u/π", a.Groups.Get(group.BucklingSpeed), 0.0148, 0.01)
	closeTo(t, "½k_flow/k", a.Groups.Get(group.FlowStiffness)/2, 1.0958e-4, 0.01)
	closeTo(t, "added mass", a.Groups.Get(group.AddedMassRatio), 2.52, 0.01)
}

// Each hazard of a pipe on both sides of its onset.
func TestPipeHazards(t *testing.T) {
	const water = `"fluid":{"density":"998 kg/m3","viscosity":"1 mPa s","sound_speed":"1480 m/s","phase":"liquid","vapour_pressure":"2.3 kPa","pressure":"%p"},"flow":{"speed":"%u"},"motion":{"amplitude":"0.1 mm"}`
	const main = `"structure":{"kind":"pipe","inner_diameter":"0.3 m","wall_thickness":"8 mm","length":"8 m","column_length":"1200 m","material":"steel","anchoring":"throughout","closure_time":"%t"}`
	const tube = `"structure":{"kind":"pipe","inner_diameter":"10 mm","wall_thickness":"1 mm","length":"1 m","density":"1100 kg/m3","young_modulus":"20 MPa","poisson_ratio":0.4,"support":"%s","speed_change":"0 m/s"%x}`
	fill := func(text string, pairs ...string) string {
		return "{" + strings.NewReplacer(pairs...).Replace(text) + "}"
	}
	rows := []struct {
		name, text string
		entry      *assumption.Entry
		want       finding.Verdict
		class      string
	}{
		{"slow valve", fill(main+","+water, "%t", "120 s", "%p", "12 bar", "%u", "1 m/s"), assumption.NoPressureSurge, finding.Valid, ""},
		{"fast valve", fill(main+","+water, "%t", "1 s", "%p", "12 bar", "%u", "1 m/s"), assumption.NoPressureSurge, finding.Invalid, "pressure-surge-1d"},
		{"fast valve: the column separates", fill(main+","+water, "%t", "1 s", "%p", "6 bar", "%u", "1 m/s"), assumption.NoCavitation, finding.Invalid, "pressure-surge-1d"},
		{"slow valve: it does not", fill(main+","+water, "%t", "120 s", "%p", "12 bar", "%u", "1 m/s"), assumption.NoCavitation, finding.Valid, ""},
		{"pinned, slow", fill(tube+","+water, "%s", "pinned-pinned", "%x", "", "%p", "1.01325 bar", "%u", "0.5 m/s"), assumption.NoBucklingByFlow, finding.Valid, ""},
		{"pinned, fast", fill(tube+","+water, "%s", "pinned-pinned", "%x", "", "%p", "1.01325 bar", "%u", "3 m/s"), assumption.NoBucklingByFlow, finding.Invalid, ""},
		{"clamped, as fast: stable", fill(tube+","+water, "%s", "clamped-clamped", "%x", "", "%p", "1.01325 bar", "%u", "1.5 m/s"), assumption.NoBucklingByFlow, finding.Valid, ""},
		{"pinned, buckled by pressure", fill(tube+","+water, "%s", "pinned-pinned", "%x", "", "%p", "30 bar", "%u", "0.1 m/s"), assumption.NoBucklingByFlow, finding.Invalid, ""},
		{"the same, ends free along the axis", fill(tube+","+water, "%s", "pinned-pinned", "%x", `,"ends_held":false`, "%p", "30 bar", "%u", "0.1 m/s"), assumption.NoBucklingByFlow, finding.Valid, ""},
		{"free end, slow", fill(tube+","+water, "%s", "clamped-free", "%x", "", "%p", "1.013 bar", "%u", "2 m/s"), assumption.NoFlutter, finding.Valid, ""},
		{"free end, fast", fill(tube+","+water, "%s", "clamped-free", "%x", "", "%p", "1.013 bar", "%u", "10 m/s"), assumption.NoFlutter, finding.Invalid, ""},
		{"standing, falls by itself", fill(tube+","+water, "%s", "clamped-free", "%x", `,"inclination":"-90 deg"`, "%p", "1.013 bar", "%u", "0.1 m/s"), assumption.NoBucklingByFlow, finding.Invalid, ""},
	}
	ran := 0
	for _, r := range rows {
		t.Run(r.name, func(t *testing.T) {
			a := answerOf(t, r.text)
			if v := verdictOf(a, r.entry); v != r.want {
				p := a.Findings[r.entry.Index()].Main()
				t.Errorf("%s is %s, want %s: %+v", r.entry.ID, v, r.want, p)
			}
			if c := a.Recommendation.Class.ID; r.class != "" && c != r.class {
				t.Errorf("class %s, want %s", c, r.class)
			}
		})
		ran++
	}
	if ran != 12 {
		t.Errorf("ran %d rows", ran)
	}
}

// A sudden change that is harmless needs no closure time; another waits for it
// and says from which time on it would hold: Δp/p = 0.1/1.5.
func TestSurgeWaitsForTheClosureTime(t *testing.T) {
	const text = `{"structure":{"kind":"pipe","inner_diameter":"0.3 m","wall_thickness":"8 mm","length":"8 m","column_length":"1200 m","material":"steel","anchoring":"throughout"},
		"fluid":{"density":"998 kg/m3","viscosity":"1 mPa s","sound_speed":"1480 m/s","phase":"liquid","vapour_pressure":"2.3 kPa","pressure":"12 bar"},"flow":{"speed":"%"}}`
	slow := answerOf(t, strings.Replace(text, "%", "0.02 m/s", 1))
	if v := verdictOf(slow, assumption.NoPressureSurge); v != finding.Valid {
		t.Errorf("a harmless sudden stop: %s", v)
	}
	fast := answerOf(t, strings.Replace(text, "%", "1 m/s", 1))
	f := &fast.Findings[assumption.NoPressureSurge.Index()]
	if f.Verdict != finding.Undetermined {
		t.Fatalf("a stop of unknown time: %s", f.Verdict)
	}
	n := fast.Groups.Need(f.Main().Wait)
	if n.Input != "structure.closure_time" {
		t.Errorf("waits for %s", n.Input)
	}
	a := fast.Scales.X(scale.WaveSpeed)
	want := 998 * a * 1 / (12e5 - 101325) * 1.5 / 0.1 * 2 * 1200 / a
	closeTo(t, "closure time", n.InputFor(f.Main().Hold), want, 1e-9)
}

// The wave speed of a steel main agrees with the classical 1.2 km/s, and the
// surge of 1 m/s with 1.2 MPa.
func TestSteelMain(t *testing.T) {
	a := answerOf(t, `{"structure":{"kind":"pipe","inner_diameter":"0.5 m","wall_thickness":"10 mm","length":"1000 m","density":"7850 kg/m3","young_modulus":"200 GPa","closure_time":"0 s"},
		"fluid":{"density":"998 kg/m3","viscosity":"1 mPa s","sound_speed":"1484.7 m/s","phase":"liquid","vapour_pressure":"2.3 kPa","pressure":"11 bar"},"flow":{"speed":"1 m/s"}}`)
	closeTo(t, "a", a.Scales.X(scale.WaveSpeed), 1200, 0.03)
	gauge := 11e5 - 101325.0
	closeTo(t, "Δp", a.Groups.Get(group.SurgePressure)*gauge, 1.2e6, 0.03)
	if v := a.Findings[assumption.NoPressureSurge.Index()].Published(); len(v) != 1 || v[0].Criterion.ID != "asme-b31.4" {
		t.Errorf("the code beside it: %+v", v)
	}
}

// Fluid-filled pipe with equal speeds of sound in wall and fluid (Code_Aster
// V8.21.200): the Korteweg speed is 745 m/s; κ = 4ν² m_f/m_p = 0.064.
func TestPoissonCoupling(t *testing.T) {
	const text = `{"structure":{"kind":"pipe","inner_diameter":"80 mm","wall_thickness":"10 mm","length":"1 m","density":"10000 kg/m3","young_modulus":"10 GPa","poisson_ratio":0.3%},
		"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","sound_speed":"1000 m/s","phase":"liquid","vapour_pressure":"2 kPa"}}`
	a := answerOf(t, strings.Replace(text, "%", "", 1))
	kappa := 4 * 0.09 * 1000 * 0.0016 / (10000 * (0.0025 - 0.0016))
	speed := a.Scales.X(scale.WaveSpeed)
	closeTo(t, "κa²/(c_s² − a²)", a.Groups.Get(group.AxialCoupling), kappa*speed*speed/(1e6-speed*speed), 1e-9)
	closeTo(t, "a", speed, 745.36, 0.06) // a thick wall, c₁ 1.03 for the 1 of the thin one with joints
	held := answerOf(t, strings.Replace(text, "%", `,"anchoring":"throughout"`, 1))
	if v := verdictOf(held, assumption.NoAxialCoupling); v != finding.NotApplicable {
		t.Errorf("a pipe that is held throughout: %s", v)
	}
}

// Contradictions are violations of the field that is wrong.
func TestPipeContradictions(t *testing.T) {
	rows := []struct{ text, want string }{
		{`{"structure":{"kind":"pipe"}}`, "/structure/inner_diameter missing"},
		{`{"structure":{"kind":"pipe","inner_diameter":"1 cm","support":"clamped-free","tension":"1 N"}}`, "/structure/tension contradiction"},
		{`{"structure":{"kind":"pipe","inner_diameter":"1 cm","support":"clamped-free","ends_held":true}}`, "/structure/ends_held contradiction"},
		{`{"structure":{"kind":"pipe","inner_diameter":"1 cm"},"fluid":"water","flow":{"speed":"1 m/s","direction":"cross"}}`, "/flow/direction out-of-range"},
		{`{"structure":{"kind":"vessel"},"fluid":"blood"}`, "/structure/radius missing"},
		{`{"structure":{"kind":"vessel","radius":"1 cm"}}`, "/fluid missing"},
		{`{"structure":{"kind":"vessel","radius":"1 cm","pulse_frequency":"1 Hz"},"fluid":"blood","motion":{"frequency":"2 Hz"}}`, "/motion/frequency contradiction"},
		{`{"structure":{"kind":"vessel","radius":"1 cm","peak_speed":"0.1 m/s"},"fluid":"blood","flow":{"speed":"0.2 m/s"}}`, "/structure/peak_speed contradiction"},
	}
	ran := 0
	for _, r := range rows {
		if got := refusalOf(t, r.text); got != r.want {
			t.Errorf("%s: %q, want %q", r.text, got, r.want)
		}
		ran++
	}
	if ran != 8 {
		t.Errorf("ran %d", ran)
	}
}
