package kind_test

import (
	"math"
	"strings"
	"testing"

	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/scale"
)

const aorta = `{"structure":{"kind":"vessel","radius":"10 mm","wall_thickness":"1.5 mm","length":"%l","density":"1100 kg/m3","young_modulus":"0.4 MPa","poisson_ratio":0.49,"linear_strain":0.3,"pulse_frequency":"%f","peak_speed":"1 m/s","pulse_pressure":"%p"%x},
	"fluid":{"density":"1060 kg/m3","viscosity":"3.5 mPa s","sound_speed":"1570 m/s","phase":"liquid","vapour_pressure":"6 kPa"%y},"flow":{"speed":"0.2 m/s"}}`

func vesselCase(pairs ...string) string {
	return strings.NewReplacer(append(pairs, "%l", "0.3 m", "%f", "1.2 Hz", "%p", "4 kPa", "%x", "", "%y", "")...).Replace(aorta)
}

// The aorta: c = √(4e5·0.0015/(2·1060·0.01)) = 5.32 m/s, α = 0.01√(2π1.2·1060/3.5e-3)
// = 15.1, ρ_s h/(ρR) = 0.156; the wave is long and one-dimensional, and between
// solvers only an implicit coupling stands.
func TestAorta(t *testing.T) {
	a := answerOf(t, vesselCase())
	if c := a.Recommendation.Class.ID; c != "pulse-wave-1d" {
		t.Errorf("class %s, want pulse-wave-1d", c)
	}
	closeTo(t, "c", a.Scales.X(scale.WaveSpeed), 5.3, 0.01)
	closeTo(t, "α", a.Groups.Get(group.Womersley), 15, 0.02)
	closeTo(t, "ρ_s h/(ρR)", a.Groups.Get(group.WallMassRatio), 0.156, 0.01)
	closeTo(t, "strain", a.Groups.Get(group.WallStrain), 4000*0.01/(4e5*0.0015), 1e-9)
	closeTo(t, "Re_peak", a.Groups.Get(group.ReynoldsPeak), 0.02*1060/3.5e-3, 1e-9)
	rows := []struct {
		entry *assumption.Entry
		want  finding.Verdict
	}{
		{assumption.ExplicitCoupling, finding.Invalid}, {assumption.LongPulse, finding.Valid}, {assumption.RigidStructure, finding.Invalid},
		{assumption.QuasiSteady, finding.Invalid}, {assumption.SteadyFlow, finding.Invalid}, {assumption.NoBucklingByFlow, finding.NotApplicable},
		{assumption.IncompressibleOscillation, finding.Valid}, {assumption.PlugFlow, finding.NotApplicable}, {assumption.OneDimensionalWaves, finding.NotApplicable},
	}
	ran := 0
	for _, r := range rows {
		if v := verdictOf(a, r.entry); v != r.want {
			t.Errorf("%s is %s, want %s", r.entry.ID, v, r.want)
		}
		ran++
	}
	if ran != 9 {
		t.Errorf("ran %d", ran)
	}
}

// The added mass of a long segment is 2(ℓ/πR)² of ρR: a round tube has twice
// that of a plane channel.
func TestVesselAddedMass(t *testing.T) {
	a := answerOf(t, vesselCase("%l", "2 m"))
	wall := 1100 * 0.0015 * (1 + 0.075)
	want := 1060 * 0.01 * 2 * math.Pow(2/(math.Pi*0.01), 2) / wall
	closeTo(t, "μ", a.Groups.Get(group.AddedMassRatio), want, 1e-3)
}

// What outgrows the one-dimensional pulse, and what does not.
func TestVesselTurns(t *testing.T) {
	rows := []struct {
		name, text string
		entry      *assumption.Entry
		want       finding.Verdict
	}{
		{"a hard pulse widens the wall too much", vesselCase("%p", "12 kPa"), assumption.LongPulse, finding.Invalid},
		{"a fast pump makes short waves", vesselCase("%f", "120 Hz"), assumption.LongPulse, finding.Invalid},
		{"a short segment is passed at once", vesselCase("%l", "5 mm", "%p", "0.2 kPa"), assumption.RigidStructure, finding.Valid},
		{"pressed flat", vesselCase("%x", `,"external_pressure":"108 kPa"`, "%y", `,"pressure":"102 kPa"`), assumption.NoBucklingByFlow, finding.Invalid},
		{"not pressed flat", vesselCase("%x", `,"external_pressure":"108 kPa"`, "%y", `,"pressure":"114 kPa"`), assumption.NoBucklingByFlow, finding.Valid},
		{"waits for the pressure inside", vesselCase("%x", `,"external_pressure":"108 kPa"`), assumption.NoBucklingByFlow, finding.Undetermined},
		{"slow: a succession of steady flows", vesselCase("%f", "0.0002 Hz"), assumption.QuasiSteady, finding.Valid},
	}
	ran := 0
	for _, r := range rows {
		a := answerOf(t, r.text)
		if v := verdictOf(a, r.entry); v != r.want {
			t.Errorf("%s: %s is %s, want %s: %+v", r.name, r.entry.ID, v, r.want, a.Findings[r.entry.Index()].Main())
		}
		ran++
	}
	if ran != 7 {
		t.Errorf("ran %d", ran)
	}
}

// Without a pulse pressure the wave without reflections gives it: ρc(U_peak − U).
func TestPulsePressureFromThePeak(t *testing.T) {
	a := answerOf(t, strings.Replace(vesselCase(), `,"pulse_pressure":"4 kPa"`, "", 1))
	c := a.Scales.X(scale.WaveSpeed)
	closeTo(t, "Δp", a.Scales.X(scale.PulsePressure), 1060*c*0.8, 1e-9)
	closeTo(t, "strain", a.Groups.Get(group.WallStrain), 0.8/(2*c), 1e-4)
}

// Womersley's femoral artery of a dog: α 3.34, where viscosity and inertia count alike.
func TestFemoralArtery(t *testing.T) {
	a := answerOf(t, `{"structure":{"kind":"vessel","radius":"1.5 mm","pulse_frequency":"3 Hz"},"fluid":{"density":"1050 kg/m3","kinematic_viscosity":"3.8 mm2/s"}}`)
	closeTo(t, "α", a.Groups.Get(group.Womersley), 3.34, 0.005)
	if v := verdictOf(a, assumption.InviscidOscillation); v != finding.Invalid {
		t.Errorf("inviscid-oscillation %s", v)
	}
	if v := verdictOf(a, assumption.QuasiSteady); v != finding.Invalid {
		t.Errorf("quasi-steady %s", v)
	}
}
