package kind_test

import (
	"fmt"
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/canon"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
)

const (
	airOf  = `"fluid":{"density":"1.21 kg/m3","kinematic_viscosity":"1.5e-5 m2/s","sound_speed":"343 m/s","phase":"gas","heat_capacity_ratio":1.4}`
	liquid = `"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","sound_speed":"1500 m/s","phase":"liquid","vapour_pressure":"2 kPa"}`
)

// Ordinary cases: what an expert expects, and the number that decides.
func TestSmallStructures(t *testing.T) {
	const speaker = `{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"10 g","frequency_dry":"%f","baffled":true,"damping_ratio":0.05},"fluid":"air","active":{"force_factor":"5 T m","coil_resistance":"5 ohm"},"motion":{"amplitude":"1 mm","frequency":"100 Hz"}%i}`
	speakerOf := func(interest string) string {
		return strings.NewReplacer("%f", "100 Hz", "%i", interest).Replace(speaker)
	}
	const silicon = `{"structure":{"kind":"film","length":"0.5 mm","width":"0.5 mm","thickness":"5 um","gap":"2 um","material":"silicon","frequency_dry":"10 kHz","quality_factor":5000},"fluid":"air","motion":{"amplitude":"10 nm","frequency":"10 kHz"}}`
	const probe = `{"structure":{"kind":"microbeam","length":"397 um","width":"29 um","thickness":"2 um","density":"2320 kg/m3","young_modulus":"169 GPa","linear_strain":0.005,"support":"clamped-free"},"fluid":{"density":"997 kg/m3","viscosity":"0.859 mPa s","sound_speed":"1495 m/s","phase":"liquid","vapour_pressure":"3.2 kPa"},"motion":{"amplitude":"10 nm"}}`
	rows := []struct {
		name, text, class, circuit string
		id                         group.ID
		want, tol                  float64
	}{
		{"loudspeaker", speakerOf(""), "added-mass", "none", group.AddedMassRatio, 2 * 8. / 3 * 1.225e-3 / 0.01, 1e-3},
		{"the same, wave number", speakerOf(""), "added-mass", "none", group.Compressibility, 0.18, 0.03},
		{"the same, response", speakerOf(`,"interest":["frequency","response"]`), "added-mass", "coupled", group.AddedMassRatio, 0.64, 0.03},
		{"the same, sound", speakerOf(`,"interest":["frequency","sound"]`), "acoustic-structure", "none", group.AddedMassRatio, 0.64, 0.03},
		{"silicon cantilever in water", probe, "viscous-added-mass", "none", group.Stokes, 8.15, 0.01},
		{"the same: f_w 5317 Hz of 17.5 kHz", probe, "viscous-added-mass", "none", group.FrequencyRatio, 0.3039, 0.005},
		{"the same: Q about 2", probe, "viscous-added-mass", "none", group.QualityFluid, 2, 0.05},
		{"silicon plate over air", silicon, "thin-film", "none", group.Knudsen, 0.034, 0.08},
		{"the same: squeeze number", silicon, "thin-film", "none", group.Squeeze, 8.3 / 1.19, 0.03},
	}
	ran := 0
	for _, r := range rows {
		a := answerOf(t, r.text)
		if c := a.Recommendation.Class.ID; c != r.class {
			t.Errorf("%s: class %s, want %s", r.name, c, r.class)
		}
		if e := a.Recommendation.Axes.Electromechanical; e != r.circuit {
			t.Errorf("%s: electromechanical %s, want %s", r.name, e, r.circuit)
		}
		closeTo(t, r.name, a.Groups.Get(r.id), r.want, r.tol)
		ran++
	}
	if ran != 9 {
		t.Errorf("ran %d", ran)
	}
}

// The textbook loudspeaker: 2000 N/m and 10 g make 71.18 Hz; 3.227 g of air a side
// make 61.89 Hz with one side (sealed behind by a huge volume); (Bl)²/R_e is
// 5 kg/s, and R_m 1 kg/s.
func TestTextbookLoudspeaker(t *testing.T) {
	const text = `{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"10 g","stiffness":"2000 N/m","baffled":true,"enclosure_volume":"1e6 m3","damping_ratio":0.1118},` + airOf + `,"active":{"force_factor":"5 T m","coil_resistance":"5 ohm"}}`
	a := answerOf(t, text)
	closeTo(t, "f", a.Scales.X(scale.FrequencyDry), 71.176, 1e-4)
	closeTo(t, "m_a", a.Scales.X(scale.AddedMass), 0.0032267, 1e-4)
	closeTo(t, "f_w", a.Scales.X(scale.FrequencyWet), 61.888, 3e-3) // the layer at the rim adds 1.6 % to the air
	omega := 2 * math.Pi * a.Scales.X(scale.FrequencyWet)
	wet := 0.01 + 0.0032267*a.Groups.Get(group.ViscousInertia)
	closeTo(t, "ζ_e", a.Groups.Get(group.DampingElectric), 5/(2*wet*omega), 1e-4)
	closeTo(t, "coil over suspension", a.Groups.Get(group.DampingElectric)/a.Groups.Get(group.DampingRatio), 5, 1e-3)
}

// The resistance and the mass of the piston at ka = 1 are those of the tables:
// R₁(2) = 0.4233, X₁(2) = 0.6468.
func TestPistonRadiation(t *testing.T) {
	const f = 1481 / (2 * math.Pi * 0.1)
	text := fmt.Sprintf(`{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"5 kg","frequency_wet":"%.12g Hz","baffled":true},"fluid":{"density":"998 kg/m3","viscosity":"1 mPa s","sound_speed":"1481 m/s","phase":"liquid","vapour_pressure":"2 kPa"}}`, f)
	a := answerOf(t, text)
	ideal := 8 / (3 * math.Pi)
	closeTo(t, "R₁", a.Groups.Get(group.AcousticDamping)*ideal, 0.4233, 2e-4)
	closeTo(t, "X₁", a.Groups.Get(group.AcousticInertia)*ideal, 0.6468, 2e-4)
	closeTo(t, "R/X", a.Groups.Get(group.AcousticDamping)/a.Groups.Get(group.AcousticInertia), 0.65, 0.01)
}

// A free disc radiates as a dipole, (16/27π²)(ka)⁴ ρcπa², and carries (8/3)ρa³ in all.
func TestFreeDisc(t *testing.T) {
	text := `{"structure":{"kind":"piston","radius":"10 mm","moving_mass":"1 g","frequency_wet":"500 Hz","baffled":false},` + airOf + `}`
	a := answerOf(t, text)
	x := 2 * math.Pi * 500 * 0.01 / 343
	closeTo(t, "m_a", a.Scales.X(scale.AddedMass), 8./3*1.21*1e-6, 1e-6)
	closeTo(t, "R", a.Groups.Get(group.AcousticDamping)*8./3*x/math.Pi, 16/(27*math.Pi*math.Pi)*math.Pow(x, 4), 1e-3)
}

// A sealed volume is a spring ρc²(πa²)²/V; the wet frequency has it, and a wet
// frequency that is given has it taken off.
func TestEnclosure(t *testing.T) {
	const open = `{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"10 g",%s,"baffled":true,"enclosure_volume":"20 L"},` + airOf + `}`
	a := answerOf(t, fmt.Sprintf(open, `"stiffness":"2000 N/m"`))
	box := 1.21 * 343 * 343 * math.Pow(math.Pi*0.01, 2) / 0.02
	closeTo(t, "k_f/k", a.Groups.Get(group.FluidStiffness), box/2000, 1e-9)
	wet := 0.01 + 0.0032267*a.Groups.Get(group.ViscousInertia)
	fw := math.Sqrt((2000+box)/wet) / (2 * math.Pi)
	closeTo(t, "f_w", a.Scales.X(scale.FrequencyWet), fw, 1e-4)
	b := answerOf(t, fmt.Sprintf(open, fmt.Sprintf(`"frequency_wet":"%.15g Hz"`, a.Scales.X(scale.FrequencyWet))))
	closeTo(t, "f", b.Scales.X(scale.FrequencyDry), math.Sqrt(2000/0.01)/(2*math.Pi), 1e-9)
	if v := verdictOf(a, assumption.NoAcousticResonance); v != finding.Valid {
		t.Errorf("resonance of the box is %s", v)
	}
}

// The box resonates near c/(2 V^⅓): at 20 L 632 Hz.
func TestBoxResonance(t *testing.T) {
	rows := []struct {
		f    string
		want finding.Verdict
	}{{"60 Hz", finding.Valid}, {"730 Hz", finding.Invalid}}
	ran := 0
	for _, r := range rows {
		a := answerOf(t, `{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"10 g","frequency_dry":"`+r.f+`","baffled":true,"enclosure_volume":"20 L"},`+airOf+`}`)
		if v := verdictOf(a, assumption.NoAcousticResonance); v != r.want {
			t.Errorf("%s: %s, want %s; f_w/f_a %.3g", r.f, v, r.want, a.Groups.Get(group.CavityFrequency))
		}
		ran++
	}
	if ran != 2 {
		t.Errorf("ran %d", ran)
	}
}

// A film of liquid over a strip: c = ηb³/g³ per length; a gas that has no time
// to escape is a spring pA/g; both stand on either side of a solved limit.
func TestFilmLimits(t *testing.T) {
	// a square in slow oil: 0.42173 ηL²A/g³
	a := answerOf(t, `{"structure":{"kind":"film","length":"20 mm","width":"20 mm","gap":"0.1 mm","moving_mass":"50 g","frequency_dry":"20 Hz","open_back":false,"damping_ratio":0},"fluid":{"density":"900 kg/m3","viscosity":"0.2 Pa s","sound_speed":"1400 m/s","phase":"liquid","vapour_pressure":"1 Pa"}}`)
	c := 0.421731 * 0.2 * math.Pow(0.02, 4) / 1e-12
	wet := 0.05 + a.Scales.X(scale.AddedMass)*a.Groups.Get(group.ViscousInertia)
	closeTo(t, "c of oil", a.Groups.Get(group.DampingViscous)*2*wet*2*math.Pi*a.Scales.X(scale.FrequencyWet), c, 1e-4)
	closeTo(t, "inertia of a slow film", a.Groups.Get(group.ViscousInertia), 1.2, 1e-3)
	if v := a.Recommendation.Class.ID; v != "thin-film" {
		t.Errorf("oil film: class %s", v)
	}
	// gas at σ ≫ 1: all spring
	b := answerOf(t, `{"structure":{"kind":"film","length":"20 mm","width":"20 mm","gap":"10 um","moving_mass":"50 g","frequency_dry":"60 kHz","open_back":false},`+airOf+`}`)
	spring := 101325 * 4e-4 / 1e-5 / (0.05 * math.Pow(2*math.Pi*60000, 2))
	closeTo(t, "spring of gas", b.Groups.Get(group.FluidStiffness), spring, 0.08)
	if got, whole := b.Groups.Get(group.FluidStiffness), spring; got > whole {
		t.Errorf("the film is stiffer than trapped gas: %g of %g", got, whole)
	}
	fw, f := b.Scales.X(scale.FrequencyWet), b.Scales.X(scale.FrequencyDry)
	closeTo(t, "f_w", fw, f*math.Sqrt(1+b.Groups.Get(group.FluidStiffness)), 1e-6)
}

// Friction and inertia of a liquid in a gap are one impedance: the layer's mass
// times Γ of the flow between two walls is the damper of lubrication when slow.
func TestLayerMeetsFilm(t *testing.T) {
	text := func(gap, f string) string {
		return `{"structure":{"kind":"film","length":"20 mm","width":"60 mm","gap":"` + gap + `","moving_mass":"50 g","frequency_dry":"` + f + `","open_back":false},` + liquid + `}`
	}
	film := answerOf(t, text("0.2 mm", "2 Hz"))
	layer := answerOf(t, text("0.2 mm", "60 Hz"))
	if !film.Groups.Is(group.Film) || layer.Groups.Is(group.Film) {
		t.Fatalf("ωg²/ν %g is a film: %v; %g: %v", film.Groups.Get(group.FilmReynolds), film.Groups.Is(group.Film), layer.Groups.Get(group.FilmReynolds), layer.Groups.Is(group.Film))
	}
	c := func(a *regime.Answer) float64 {
		wet := 0.05 + a.Scales.X(scale.AddedMass)*a.Groups.Get(group.ViscousInertia)
		return a.Groups.Get(group.DampingViscous) * 2 * wet * 2 * math.Pi * a.Scales.X(scale.FrequencyWet)
	}
	third, err := canon.ThinFilmLiquid(1. / 3)
	if err != nil {
		t.Fatal(err)
	}
	closeTo(t, "c of the film", c(film), third*1e-3*4e-4*1.2e-3/8e-12, 1e-3)
	closeTo(t, "c of the layer", c(layer), c(film), 0.02) // friction grows with ω² from there on
	if v := layer.Recommendation.Class.ID; v != "viscous-added-mass" {
		t.Errorf("layer: class %s", v)
	}
}

// A beam over a wall: a film below 15 % of the width, open fluid beyond it.
func TestBeamOverWall(t *testing.T) {
	const text = `{"structure":{"kind":"microbeam","length":"300 um","width":"30 um","thickness":"2 um","material":"silicon","support":"%s","quality_factor":1000},` + airOf + `,"motion":{"amplitude":"5 nm"}%w}`
	of := func(support, wall string) string {
		return strings.NewReplacer("%s", support, "%w", wall).Replace(text)
	}
	free := answerOf(t, of("clamped-free", ""))
	over := answerOf(t, of("clamped-free", `,"surroundings":{"wall_gap":"2 um"}`))
	far := answerOf(t, of("clamped-free", `,"surroundings":{"wall_gap":"200 um"}`))
	if c := over.Recommendation.Class.ID; c != "thin-film" || !over.Groups.Is(group.Film) {
		t.Errorf("over a wall: class %s", c)
	}
	if c := free.Recommendation.Class.ID; c != "dry-structure" {
		t.Errorf("in open air: class %s", c)
	}
	if !(over.Groups.Get(group.QualityFluid) < 0.1*free.Groups.Get(group.QualityFluid)) {
		t.Errorf("Q %g over the wall, %g without", over.Groups.Get(group.QualityFluid), free.Groups.Get(group.QualityFluid))
	}
	closeTo(t, "Q far from a wall", far.Groups.Get(group.QualityFluid), free.Groups.Get(group.QualityFluid), 1e-9)
	// a strip at small σ: ηb³/g³ per length
	g := over.Groups
	eta := 1.21 * 1.5e-5 / (1 + 9.638*math.Pow(g.Get(group.Knudsen), 1.159))
	omega := 2 * math.Pi * over.Scales.X(scale.FrequencyWet)
	closeTo(t, "ζ of the strip", g.Get(group.DampingViscous), eta*math.Pow(30e-6, 3)/8e-18/(2*over.Scales.X(scale.DryMass)*omega), 0.05)
	// two prongs close the gap twice as fast
	fork := answerOf(t, strings.Replace(of("tuning-fork", ""), `"quality_factor"`, `"prong_gap":"2 um","quality_factor"`, 1))
	closeTo(t, "fork", fork.Groups.Get(group.DampingViscous)/g.Get(group.DampingViscous), 2, 0.05)
	closeTo(t, "stroke", fork.Groups.Get(group.DisplacementGap)/g.Get(group.DisplacementGap), 2, 1e-9)
}

// A doubly clamped beam of large amplitude stretches; a small one does not.
func TestClampedBeamStretches(t *testing.T) {
	rows := []struct {
		amplitude string
		want      finding.Verdict
	}{{"20 nm", finding.Valid}, {"3 um", finding.Invalid}}
	ran := 0
	for _, r := range rows {
		a := answerOf(t, `{"structure":{"kind":"microbeam","length":"300 um","width":"30 um","thickness":"2 um","material":"silicon","support":"clamped-clamped"},"motion":{"amplitude":"`+r.amplitude+`"}}`)
		if v := verdictOf(a, assumption.SmallDisplacement); v != r.want {
			t.Errorf("%s: %s, want %s", r.amplitude, v, r.want)
		}
		closeTo(t, "f", a.Scales.X(scale.FrequencyDry), 22.3733/(2*math.Pi*9e-8)*math.Sqrt(a.Scales.X(scale.Young)*4e-12/12/a.Scales.X(scale.SolidDensity)), 1e-4)
		ran++
	}
	if ran != 2 {
		t.Errorf("ran %d", ran)
	}
}

// The circuit: K² from a coupling factor, from two frequencies and as given agree;
// the damping of a resistor is greatest where it is matched.
func TestActive(t *testing.T) {
	const text = `{"structure":{"kind":"microbeam","length":"50.8 mm","width":"31.8 mm","thickness":"0.66 mm","density":"7800 kg/m3","young_modulus":"66 GPa","frequency_dry":"45.6 Hz","damping_ratio":0.027},"interest":["frequency","response"],"active":{%a}}`
	of := func(active string) string { return strings.Replace(text, "%a", active, 1) }
	two := answerOf(t, of(`"frequency_short":"45.6 Hz","frequency_open":"48.4 Hz"`))
	k2 := math.Pow(48.4/45.6, 2) - 1
	closeTo(t, "K²", two.Groups.Get(group.Electromechanical), k2, 1e-12)
	factor := answerOf(t, of(fmt.Sprintf(`"coupling_factor":%.15g`, math.Sqrt(k2/(1+k2)))))
	closeTo(t, "K² of k", factor.Groups.Get(group.Electromechanical), k2, 1e-12)
	if v := verdictOf(two, assumption.PassiveStructure); v != finding.Invalid || two.Recommendation.Axes.Electromechanical != "coupled" {
		t.Errorf("the bimorph is passive: %s", v)
	}
	if c := two.Recommendation.Class.ID; c != "dry-structure" {
		t.Errorf("the circuit changed the class to %s", c)
	}
	rapid.Check(t, func(rt *rapid.T) {
		k2 := rapid.Float64Range(0.01, 1).Draw(rt, "K²")
		r := rapid.Float64Range(0.01, 100).Draw(rt, "r")
		omega := 2 * math.Pi * 45.6
		a := answerOf(t, of(fmt.Sprintf(`"electromechanical_coupling":%.12g,"capacitance":"1e-8 F","load_resistance":"%.12g ohm"`, k2, r/(omega*1e-8))))
		stiffness := 1 + complex(k2, 0)*complex(0, r)/complex(1, r)
		if want := imag(stiffness) / real(stiffness) / 2; math.Abs(a.Groups.Get(group.DampingElectric)/want-1) > 1e-8 {
			rt.Fatalf("ζ_e %g, want %g", a.Groups.Get(group.DampingElectric), want)
		}
		if share := a.Groups.Get(group.HarvestShare); 4*math.Pi*a.Groups.Get(group.DampingElectric) > share*(1+1e-9) {
			rt.Fatalf("a load takes more than the matched one")
		}
	})
}

// Contradictions are refused.
func TestSmallContradictions(t *testing.T) {
	rows := []string{
		`{"structure":{"kind":"film","length":"1 mm","width":"1 mm","gap":"2 mm","moving_mass":"1 g"}}`,
		`{"structure":{"kind":"film","length":"1 mm","gap":"2 um","moving_mass":"1 g"}}`,
		`{"structure":{"kind":"film","length":"1 mm","width":"1 mm","moving_mass":"1 g"}}`,
		`{"structure":{"kind":"film","radius":"1 mm","width":"1 mm","gap":"2 um","moving_mass":"1 g"}}`,
		`{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"1 g"},"fluid":"air","surroundings":{"wall_gap":"1 mm"}}`,
		`{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"1 g","frequency_wet":"5 Hz","enclosure_volume":"1 L"},"fluid":"air"}`,
		`{"structure":{"kind":"piston","radius":"0.1 m","stroke":"1 mm"},"motion":{"amplitude":"2 mm"}}`,
		`{"structure":{"kind":"microbeam","length":"1 mm","width":"0.1 mm","prong_gap":"10 um"}}`,
		`{"structure":{"kind":"microbeam","length":"1 mm","width":"0.1 mm"},"active":{"force_factor":"5 T m","coil_resistance":"5 ohm"}}`,
		`{"structure":{"kind":"piston","radius":"0.1 m"},"active":{"force_factor":"5 T m","electromechanical_coupling":0.1}}`,
		`{"structure":{"kind":"piston","radius":"0.1 m"},"active":{"frequency_open":"5 Hz"}}`,
		`{"structure":{"kind":"piston","radius":"0.1 m"},"active":{"frequency_open":"5 Hz","frequency_short":"6 Hz"}}`,
		`{"structure":{"kind":"piston","radius":"0.1 m"},"flow":{"speed":"1 m/s"},"fluid":"air"}`,
	}
	ran := 0
	for _, text := range rows {
		c, bad, err := input.Decode([]byte(text), kind.Schema())
		if err != nil {
			t.Fatal(err)
		}
		if len(bad) == 0 {
			_, _, bad = kind.Resolve(c)
		}
		if len(bad) == 0 {
			t.Errorf("accepted: %s", text)
		}
		ran++
	}
	if ran != 13 {
		t.Errorf("ran %d", ran)
	}
}

// The suction under a plate that leaves oil: 2.096 times the mean cωξ/A; a stroke
// that asks for more than the pressure around parts the film.
func TestFilmCavitates(t *testing.T) {
	rows := []struct {
		stroke string
		want   finding.Verdict
	}{{"0.02 um", finding.Valid}, {"20 um", finding.Invalid}}
	ran := 0
	for _, r := range rows {
		a := answerOf(t, `{"structure":{"kind":"film","length":"20 mm","width":"20 mm","gap":"0.1 mm","moving_mass":"5 kg","frequency_dry":"20 Hz","open_back":false,"stroke":"`+r.stroke+`"},"fluid":{"density":"900 kg/m3","viscosity":"2 Pa s","sound_speed":"1400 m/s","phase":"liquid","vapour_pressure":"1 Pa"}}`)
		if v := verdictOf(a, assumption.NoCavitation); v != r.want {
			t.Errorf("%s: %s, want %s", r.stroke, v, r.want)
		}
		c := 0.421731 * 2 * math.Pow(0.02, 4) / 1e-12
		omega := 2 * math.Pi * a.Scales.X(scale.FrequencyMotion)
		closeTo(t, "suction", a.Groups.Get(group.OscillationPressure), 2.096*c*omega*a.Scales.X(scale.Amplitude)/4e-4/101324, 1e-3)
		ran++
	}
	if ran != 2 {
		t.Errorf("ran %d", ran)
	}
}

// Slow flow in a gap is Poiseuille's: Γ → 6/5 − i 12ν/(ωg²), for a plate too.
func TestSlowGap(t *testing.T) {
	a := answerOf(t, `{"structure":{"kind":"plate","length":"1 mm","width":"1 mm","thickness":"50 um","material":"steel","edges":"CCCC","frequency_dry":"100 Hz","wetted_sides":2,"baffled":true},
		"fluid":{"density":"900 kg/m3","viscosity":"50 Pa s","sound_speed":"1400 m/s","phase":"liquid","vapour_pressure":"1 Pa"},"surroundings":{"wall_gap":"0.3 mm"}}`)
	omega := 2 * math.Pi * a.Scales.X(scale.FrequencyWet)
	slow := omega * 9e-8 * 900 / 50
	closeTo(t, "Γr", a.Groups.Get(group.ViscousInertia), 1.2, 1e-3)
	closeTo(t, "Γi", a.Groups.Get(group.ViscousDamping), 12/slow, 1e-3)
}
