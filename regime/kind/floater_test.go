package kind_test

import (
	"math"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/scale"
)

const (
	monopile = `{"structure":{"kind":"cylinder","diameter":"6 m","length":"107.6 m","wall_thickness":"60 mm","material":"steel","support":"clamped-free","frequency_wet":"0.28 Hz","damping_ratio":0.01},"fluid":"seawater","waves":{"height":"6 m","period":"10 s","depth":"20 m"}}`
	barge    = `{"structure":{"kind":"floater","shape":"box","length":"40 m","width":"40 m","draft":"4 m","volume":"6000 m3","mass":"6149.46 t","waterplane_area":"1500 m2","natural_period_heave":"7.8 s","damping_ratio":0.1},"fluid":"seawater","waves":{"height":"2 m","period":"7.8 s","depth":"150 m"}}`
	spar     = `{"structure":{"kind":"floater","diameter":"9.4 m","draft":"120 m","natural_period_heave":"31 s","natural_period_pitch":"29 s","mooring_stiffness":"41 kN/m","damping_ratio":0.05},"fluid":"seawater","waves":{"height":"3 m","period":"10 s","depth":"320 m","air_gap":"10 m"}}`
	caisson  = `{"structure":{"kind":"floater","fixed":true,"diameter":"40 m","mass":"20000 t","frequency_dry":"2 Hz","damping_ratio":0.02},"fluid":"seawater","waves":{"height":"2 m","period":"7 s","depth":"25 m"}}`
	buoy     = `{"structure":{"kind":"floater","shape":"sphere","diameter":"1 m","damping_ratio":0.1},"fluid":"seawater"}`
)

func TestOrdinaryBodiesInWaves(t *testing.T) {
	runExpected(t, []expected{
		{"monopile of 6 m in a wave of 10 s", monopile, "morison", groupOf(group.Diffraction), 0.0495, 0.002},
		{"the same: off resonance", monopile, "morison", groupOf(group.WaveRatio), 0.357, 0.001},
		{"the same: KC at the surface", monopile, "morison", groupOf(group.KeuleganCarpenter), 4.0458, 0.001},
		// C_D KC/(π² C_M): 0.7·4.05/(9.87·2.04)
		{"the same: inertia dominated", monopile, "morison", groupOf(group.DragInertia), 0.14, 0.05},
		{"barge of 40 m in waves of its heave", barge, "diffraction-radiation", groupOf(group.Diffraction), 0.4211, 0.003},
		{"spar", spar, "morison", groupOf(group.Diffraction), 9.4 / 156.1, 0.002},
		{"caisson that diffracts the waves", caisson, "diffraction-radiation", groupOf(group.Diffraction), 40 / 74.3, 0.003},
		// half a sphere: added mass half the displaced, stiffness ρgπa²: ω² = g π a²/(1.5·(2/3)π a³) = g/a
		{"ball that bobs", buoy, "diffraction-radiation", scaleOf(scale.FrequencyWet), math.Sqrt(9.80665/0.5) / (2 * math.Pi), 1e-3},
	})
}

// The heave of the barge from its waterplane, against the 7.6 to 8.0 s that are
// published for it (Jonkman 2007, from memory).
func TestHeaveOfTheBarge(t *testing.T) {
	a := atSurface(t, with(barge, `"natural_period_heave":"7.8 s",`, ""))
	if period := 1 / a.Scales.X(scale.FrequencyWet); period < 7.2 || period > 8 {
		t.Errorf("heave period %g s", period)
	}
}

// Long waves lift a floating body as they rise, whatever its shape.
func TestLongWavesCarryTheBody(t *testing.T) {
	ran := 0
	for _, text := range []string{
		`"shape":"box","length":"10 m","width":"5 m","draft":"1 m"`,
		`"diameter":"10 m","draft":"2 m"`,
		`"shape":"sphere","diameter":"4 m"`,
		`"shape":"horizontal-cylinder","diameter":"3 m","length":"12 m"`,
	} {
		a := atSurface(t, `{"structure":{"kind":"floater",`+text+`},"fluid":"seawater","waves":{"height":"2 m","period":"200 s"}}`)
		if x := a.Scales.X(scale.WaveDeflection); math.Abs(x-1) > 0.01 {
			t.Errorf("%s: moved by %g m in a wave of 1 m amplitude", text, x)
		}
		ran++
	}
	if ran != 4 {
		t.Errorf("ran %d shapes", ran)
	}
}

// Hazards and limits in waves, on each side of their onset.
func TestWaveHazards(t *testing.T) {
	runVerdicts(t, []verdictRow{
		{"waves at the heave", barge, assumption.NoWaveResonance, finding.Invalid},
		{"waves far below it", with(barge, `"period":"7.8 s"`, `"period":"20 s"`), assumption.NoWaveResonance, finding.Valid},
		{"waves at the pitch", with(barge, `"natural_period_heave":"7.8 s"`, `"natural_period_heave":"4 s","natural_period_pitch":"8 s"`), assumption.NoWaveResonance, finding.Invalid},
		{"waves at the mooring", with(barge, `"natural_period_heave":"7.8 s"`, `"natural_period_heave":"3 s","mooring_stiffness":"8 MN/m"`), assumption.NoWaveResonance, finding.Invalid},
		{"the third harmonic of a steep wave meets the mode", monopile, assumption.NoWaveResonance, finding.Marginal},
		{"that of a low wave has nothing in it", with(monopile, `"height":"6 m"`, `"height":"0.5 m"`), assumption.NoWaveResonance, finding.Valid},
		{"waves off every harmonic", with(monopile, `"period":"10 s"`, `"period":"20 s"`), assumption.NoWaveResonance, finding.Valid},
		{"waves half a period off the mode", with(monopile, `"period":"10 s"`, `"period":"3.6 s"`), assumption.NoWaveResonance, finding.Invalid},
		{"a crest below the deck", spar, assumption.NoSlamming, finding.Valid},
		{"a crest at the deck", with(spar, `"air_gap":"10 m"`, `"air_gap":"1.5 m"`), assumption.NoSlamming, finding.Marginal},
		{"a crest in the deck", with(spar, `"air_gap":"10 m"`, `"air_gap":"0.8 m"`), assumption.NoSlamming, finding.Invalid},
		{"a wave that breaks at the pile", with(monopile, `"height":"6 m","period":"10 s","depth":"20 m"`, `"height":"18 m","period":"10 s","depth":"20 m"`), assumption.NoSlamming, finding.Invalid},
		{"a thin pile", monopile, assumption.LongWave, finding.Valid},
		{"a caisson", caisson, assumption.LongWave, finding.Invalid},
		{"a barge", barge, assumption.LongWave, finding.Invalid},
		{"low waves", caisson, assumption.LinearFreeSurface, finding.Valid},
		{"steep waves", with(caisson, `"height":"2 m"`, `"height":"9 m"`), assumption.LinearFreeSurface, finding.Invalid},
		{"no flow in waves is steady", monopile, assumption.SteadyFlow, finding.Invalid},
		{"a stiff pile hardly moves", monopile, assumption.OneWay, finding.Valid},
		{"waves alone lock no wake", monopile, assumption.NoLockIn, finding.NotApplicable},
		{"a current past a spar on its mooring", with(spar, `"fluid":`, `"flow":{"speed":"0.5 m/s"},"fluid":`), assumption.NoLockIn, finding.Invalid},
		{"a slow current past it", with(spar, `"fluid":`, `"flow":{"speed":"0.05 m/s"},"fluid":`), assumption.NoLockIn, finding.Valid},
	})
}

// A pile that stands partly in the water has added mass where it is wet only.
func TestWettedPile(t *testing.T) {
	dry := atSurface(t, monopile).Groups.Get(group.AddedMassRatio)
	deep := atSurface(t, with(monopile, `"depth":"20 m"`, `"depth":"107.6 m"`)).Groups.Get(group.AddedMassRatio)
	if whole := 1026 * math.Pi * 9 / (7850 * math.Pi * 5.94 * 0.06); math.Abs(deep/whole-1) > 0.01 {
		t.Errorf("added mass ratio %g of a pile that is all wet, want %g", deep, whole)
	}
	if dry > 0.001*deep {
		t.Errorf("the foot of the mode has %g of the added mass of all of it", dry/deep)
	}
}

// A lying cylinder feels the waves at its depth.
func TestLyingCylinderInWaves(t *testing.T) {
	const text = `{"structure":{"kind":"cylinder","diameter":"0.5 m","length":"20 m","wall_thickness":"15 mm","material":"steel","support":"pinned-pinned","damping_ratio":0.01},"fluid":"seawater","waves":{"height":"3 m","period":"8 s","depth":"30 m"},"surroundings":{"depth_below_surface":"25 m"}}`
	low := atSurface(t, text)
	high := atSurface(t, with(text, "25 m", "10 m"))
	k := 2 * math.Pi / low.Scales.X(scale.WaveLength)
	want := math.Cosh(k*5) / math.Cosh(k*20)
	if got := low.Scales.X(scale.ParticleSpeed) / high.Scales.X(scale.ParticleSpeed); math.Abs(got/want-1) > 1e-9 {
		t.Errorf("speeds at 25 and 10 m in the ratio %g, want %g", got, want)
	}
	if id := low.Recommendation.Class.ID; id != "morison" {
		t.Errorf("class %s", id)
	}
}

// What waits in waves names its input; contradictions are refused at the field.
func TestFloaterInputs(t *testing.T) {
	a := atSurface(t, with(monopile, `"period":"10 s",`, ""))
	f := &a.Findings[assumption.LongWave.Index()]
	if needs := f.Needs(nil); len(needs) == 0 || a.Groups.Need(needs[0]).Input != "waves.period" {
		t.Errorf("%s %v", f.Verdict, f.Needs(nil))
	}
	rows := []refusal{
		{with(barge, `"seawater"`, `"air"`), "/fluid/phase"},
		{with(barge, `"draft":"4 m"`, `"draft":"400 m"`), "/structure/draft"},
		{with(barge, `"length":"40 m",`, ""), "/structure/length"},
		{with(buoy, `"diameter":"1 m"`, `"diameter":"1 m","draft":"2 m"`), "/structure/draft"},
		{with(buoy, `"diameter":"1 m",`, ""), "/structure/diameter"},
		{with(barge, `"natural_period_heave":"7.8 s"`, `"natural_period_heave":"7.8 s","frequency_wet":"1 Hz"`), "/structure/natural_period_heave"},
		{with(monopile, `"seawater"`, `"air"`), "/waves/height"},
		{with(monopile, `"fluid":"seawater"`, `"fluid":"seawater","flow":{"speed":"1 m/s","direction":"axial"}`), "/flow/direction"},
		{with(monopile, `"fluid":"seawater",`, ""), "/fluid"},
	}
	if ran := refuses(t, rows); ran != 9 {
		t.Errorf("ran %d rows", ran)
	}
}

// A floater weighs what it displaces, unless it says otherwise.
func TestFloaterFloats(t *testing.T) {
	a := atSurface(t, buoy)
	if x := a.Groups.Get(group.MassRatio); math.Abs(x-1) > 1e-12 {
		t.Errorf("mass ratio %g", x)
	}
	b := atSurface(t, with(buoy, `"diameter":"1 m"`, `"diameter":"1 m","mass":"600 kg"`))
	if !warned(b, "weight-differs") || warned(a, "weight-differs") {
		t.Error("the warning of a weight that the water does not carry")
	}
}

func warned(a *regime.Answer, code string) bool {
	for _, w := range a.Warnings {
		if w.Code == code {
			return true
		}
	}
	return false
}
