package regime_test

import (
	"fmt"
	"math"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/scale"
)

const (
	// Goland's wing, strip theory with 2π
	goland = `"structure":{"kind":"wing","chord":"1.8288 m","span":"6.096 m","ends":"half-wing","thickness":"73 mm","mass_per_length":"35.71 kg/m","inertia_per_length":"8.64 kg m","bending_stiffness":"9.77e6 N m2","torsional_stiffness":"9.87e5 N m2","elastic_axis":0.33,"centre_of_gravity":0.43,"lift_slope":6.283185307,"damping_ratio":0},
		"fluid":{"density":"1.225 kg/m3","viscosity":"1.789e-5 Pa s","sound_speed":"340.3 m/s","phase":"gas"},"motion":{"amplitude":"10 mm"}`
	hydrofoil = `"structure":{"kind":"wing","chord":"0.1 m","span":"0.3 m","ends":"half-wing","thickness":"10 mm","material":"steel","inertia_per_length":"3.4e-3 kg m","frequency_bending":"74 Hz","frequency_torsion":"520 Hz","elastic_axis":0.35,"centre_of_gravity":0.42,"damping_ratio":0.003},
		"fluid":{"name":"water","pressure":"%s"},"flow":{"speed":"10 m/s","incidence":"5 deg"}`
	deckWind = `"fluid":{"density":"1.25 kg/m3","viscosity":"1.8e-5 Pa s","sound_speed":"340 m/s","phase":"gas"}`
	// the deck of a long suspension bridge (Larsen 1993, from memory)
	deck  = `"structure":{"kind":"section","shape":"deck","streamlined":%s,"breadth":"31 m","depth":"4.4 m","span":"1624 m","mass_per_length":"22740 kg/m","inertia_per_length":"2.47e6 kg m","frequency_bending":"0.0998 Hz","frequency_torsion":"0.272 Hz","damping_ratio":0.005},` + deckWind
	agard = `"structure":{"kind":"wing","chord":"0.5587 m","span":"0.762 m","ends":"half-wing","thickness":"22 mm","mass_per_length":"3.51 kg/m","inertia_per_length":"0.05 kg m","frequency_bending":"9.6 Hz","frequency_torsion":"38.17 Hz","elastic_axis":0.4,"centre_of_gravity":0.45,"sweep":"45 deg","flutter_speed":"296.69 m/s","damping_ratio":0},
		"fluid":{"density":"0.09946811 kg/m3","viscosity":"1.7e-5 Pa s","sound_speed":"329.3 m/s","phase":"gas","pressure":"7.7 kPa"},"flow":{"speed":"296.69 m/s"},"motion":{"amplitude":"0.2 mm"}`
	// the prism of Parkinson & Smith 1964
	prism = `"structure":{"kind":"section","shape":"square","depth":"1 in","span":"1 m","mass_per_length":"0.90025 kg/m","frequency_bending":"5 Hz","damping_ratio":0.00107,"galloping_factor":2.69,"strouhal":0.13},
		"fluid":{"density":"1.2 kg/m3","kinematic_viscosity":"1.5e-5 m2/s","sound_speed":"340 m/s","phase":"gas"},"motion":{"amplitude":"0.5 mm"}`
)

// Sections and wings: the class that an expert expects and the price that decides.
func TestOrdinarySectionsAndWings(t *testing.T) {
	load := func(e *assumption.Entry) func(*regime.Answer) float64 {
		return func(a *regime.Answer) float64 { return estimateOf(a, e, finding.Load) }
	}
	wind := func(text string, u float64, more string) string {
		return fmt.Sprintf(`{%s,"flow":{"speed":"%g m/s"%s}}`, text, u, more)
	}
	rows := []ordinary{
		{"steel hydrofoil", "{" + fmt.Sprintf(hydrofoil, "2 bar") + "}", "steady-load", of(group.AddedMassRatio), 998.2 * math.Pi * 0.0025 / (0.685 * 0.001 * 7850), 0.01},
		{"the same: cavitation number", "{" + fmt.Sprintf(hydrofoil, "2 bar") + "}", "steady-load", of(group.Cavitation), 3.95, 0.01},
		{"Goland's wing at 60 m/s: q/(q_D − q)", wind(goland, 60, `,"incidence":"2 deg"`), "steady-load", load(assumption.RigidStructure), 0.0566 / (1 - 0.0566), 0.03},
		{"the same: U/U_F", wind(goland, 60, `,"incidence":"2 deg"`), "steady-load", of(group.FlutterSpeed), 60 / 137.2, 0.05},
		{"Goland's wing at 120 m/s", wind(goland, 120, ""), "linear-unsteady", load(assumption.OneWay), 0.2262 / (1 - 0.2262), 0.12},
		{"bluff deck at k 0.26", wind(fmt.Sprintf(deck, "false"), 37, `,"operating":["33 m/s","37 m/s"]`), "flutter-derivatives", of(group.ReducedFrequency), 0.257, 0.02},
		{"the same: |C(k) − 1|", wind(fmt.Sprintf(deck, "false"), 37, `,"operating":["33 m/s","37 m/s"]`), "flutter-derivatives", load(assumption.PseudoStatic), 0.36, 0.02},
		{"streamlined deck at k 0.26", wind(fmt.Sprintf(deck, "true"), 37, ""), "linear-unsteady", load(assumption.PseudoStatic), 0.36, 0.02},
		{"swept wing at M 0.901", "{" + agard + "}", "two-way-explicit", of(group.Mach), 0.901, 0.001},
		{"square prism that gallops far from its vortices", wind(prism, 4, `,"operating":["3 m/s","4 m/s"]`), "quasi-steady", of(group.GallopingSpeed), 4 / (11.624 * 5 * 0.0254), 0.005},
		{"square prism that its vortices lock to", wind(prism, 1.05, `,"operating":["0.9 m/s","1.05 m/s"]`), "wake-model", of(group.SheddingRatio), 0.13 * 1.05 / (5 * 0.0254), 0.01},
	}
	if ran := runOrdinary(t, rows); ran != 11 {
		t.Errorf("ran %d ordinary cases", ran)
	}
}

// Speeds of instability against published ones.
func TestAeroelasticSpeeds(t *testing.T) {
	rows := []struct {
		name, text string
		id         scale.ID
		want, tol  float64
	}{
		// Goland 1945: strip theory in closed form, and 137.2 m/s of the wing with its modes
		{"divergence of Goland's wing", `{` + goland + `,"flow":{"speed":"1 m/s"}}`, scale.DivergenceSpeed, 252.28, 0.001},
		{"flutter of Goland's wing", `{` + goland + `,"flow":{"speed":"60 m/s"}}`, scale.FlutterSpeed, 137.2, 0.04},
		{"bending of Goland's wing", `{` + goland + `,"flow":{"speed":"60 m/s"}}`, scale.FrequencyDry, 49.5 / (2 * math.Pi), 0.001},
		// Larsen 1993: 70 to 76 m/s
		{"flutter of a long bridge", `{` + fmt.Sprintf(deck, "true") + `,"flow":{"speed":"60 m/s"}}`, scale.FlutterSpeed, 73, 0.04},
		// Parkinson & Smith 1964: U_c/(fh) = 11.62
		{"galloping of a square prism", `{` + prism + `,"flow":{"speed":"3 m/s"}}`, scale.GallopingSpeed, 11.624 * 5 * 0.0254, 0.002},
		{"critical speed of a square prism", `{` + prism + `,"flow":{"speed":"3 m/s"}}`, scale.CriticalSpeed, 5 * 0.0254 / 0.13, 0.002},
	}
	for _, r := range rows {
		if x := answer(t, r.text).Scales.X(r.id); !(math.Abs(x/r.want-1) <= r.tol) {
			t.Errorf("%s: %.5g, want %.5g within %g", r.name, x, r.want, r.tol)
		}
	}
	if len(rows) != 6 {
		t.Errorf("%d rows", len(rows))
	}
}

// Each hazard on both sides of its onset, and what hinges on a shape.
func TestAeroelasticHazards(t *testing.T) {
	mast := func(shape, breadth string, zeta, lo, hi float64) string {
		return fmt.Sprintf(`{"structure":{"kind":"section","shape":%q,"breadth":%q,"depth":"0.3 m","mass_per_length":"60 kg/m","frequency_bending":"2 Hz","damping_ratio":%g,"span":"12 m"},"fluid":"air","flow":{"operating":["%g m/s","%g m/s"]}}`, shape, breadth, zeta, lo, hi)
	}
	wing := func(u float64, axis, gravity float64, more string) string {
		return fmt.Sprintf(`{"structure":{"kind":"wing","chord":"1 m","span":"5 m","ends":"half-wing","mass_per_length":"20 kg/m","inertia_per_length":"2 kg m","frequency_bending":"4 Hz","frequency_torsion":"8 Hz","damping_ratio":0.01,"elastic_axis":%g,"centre_of_gravity":%g%s},"fluid":"air","flow":{"speed":"%g m/s","incidence":"3 deg"},"motion":{"amplitude":"1 mm"}}`, axis, gravity, more, u)
	}
	v := func(text string, e *assumption.Entry) finding.Verdict {
		return answer(t, text).Findings[e.Index()].Verdict
	}
	rows := []struct {
		name string
		got  finding.Verdict
		want finding.Verdict
	}{
		{"lock-in of a square in its band", v(mast("square", "0.3 m", 0.002, 4, 6), assumption.NoLockIn), finding.Invalid},
		{"lock-in of a square below its band", v(mast("square", "0.3 m", 0.002, 0, 2.5), assumption.NoLockIn), finding.Valid},
		// a rectangle of 4 : 1 sheds at 0.13, in a band from 0.07 on
		{"lock-in of a flat rectangle", v(mast("rectangle", "1.2 m", 0.002, 4, 6), assumption.NoLockIn), finding.Invalid},
		{"lock-in of an H section, which sheds more slowly", v(mast("h_section", "0.6 m", 0.002, 0, 2.5), assumption.NoLockIn), finding.Valid},
		{"no lock-in of a plate", v(mast("plate", "3 m", 0.002, 0, 6), assumption.NoLockIn), finding.NotApplicable},
		// Sc = 4π·60·0.01/(1.225·0.09) = 68; U_CG = 2 Sc f D/1.2 = 68 m/s
		{"galloping far below its onset", v(mast("square", "0.3 m", 0.01, 20, 40), assumption.NoGalloping), finding.Valid},
		{"galloping past its onset", v(mast("square", "0.3 m", 0.001, 10, 20), assumption.NoGalloping), finding.Invalid},
		{"no galloping of a circle", v(mast("circle", "0.3 m", 0.001, 10, 20), assumption.NoGalloping), finding.NotApplicable},
		{"an elongated rectangle waits for its factor", v(mast("rectangle", "1.2 m", 0.01, 0, 3), assumption.NoGalloping), finding.Undetermined},
		{"iced cable", v(mast("iced_cable", "0.3 m", 0.001, 10, 20), assumption.NoGalloping), finding.Invalid},
		// with ζ 0.05 % U_CG is 3.4 m/s, 0.7 of the critical 5 m/s
		{"galloping with the vortices", v(mast("square", "0.3 m", 0.0007, 0, 4.7), assumption.QuasiSteady), finding.Invalid},
		{"divergence far off", v(wing(20, 0.4, 0.42, ""), assumption.NoDivergence), finding.Valid},
		{"divergence passed", v(wing(120, 0.6, 0.45, ""), assumption.NoDivergence), finding.Invalid},
		{"no divergence with the axis at the quarter chord", v(wing(90, 0.25, 0.25, ""), assumption.NoDivergence), finding.NotApplicable},
		{"sweep takes the divergence away", v(wing(90, 0.3, 0.3, `,"sweep":"30 deg"`), assumption.NoDivergence), finding.NotApplicable},
		{"forward sweep brings it", v(wing(120, 0.25, 0.3, `,"sweep":"-40 deg"`), assumption.NoDivergence), finding.Marginal},
		{"flutter far off", v(wing(10, 0.35, 0.45, ""), assumption.NoFlutter), finding.Valid},
		{"flutter passed", v(wing(90, 0.35, 0.45, ""), assumption.NoFlutter), finding.Invalid},
		{"no stall", v(wing(20, 0.4, 0.42, ""), assumption.NoStall), finding.Valid},
		{"the static twist stalls the wing", v(wing(72, 0.5, 0.42, ""), assumption.NoStall), finding.Invalid},
		{"hydrofoil at 2 bar", v("{"+fmt.Sprintf(hydrofoil, "2 bar")+`,"motion":{"amplitude":"0.1 mm"}}`, assumption.NoCavitation), finding.Valid},
		{"hydrofoil at 0.5 bar", v("{"+fmt.Sprintf(hydrofoil, "0.5 bar")+`,"motion":{"amplitude":"0.1 mm"}}`, assumption.NoCavitation), finding.Invalid},
	}
	for _, r := range rows {
		if r.got != r.want {
			t.Errorf("%s: %s, want %s", r.name, r.got, r.want)
		}
	}
	if len(rows) != 22 {
		t.Errorf("%d rows", len(rows))
	}
}

// Buffeting by a turbulent wind, worked by hand for a mast of 12 m: at 25 m/s, 2 Hz,
// L 80 m, f_L = 6.4, S_L = 6.8·6.4/(66.28)^(5/3) = 0.0401; η = 4.6·2·12/25 = 4.416 and
// 0.1104: R 0.2008 and 0.930; B² = 1/(1 + 0.9(12.3/80)^0.63) = 0.7833.
func TestBuffeting(t *testing.T) {
	text := func(zeta string) string {
		return `{"structure":{"kind":"section","shape":"square","depth":"0.3 m","mass_per_length":"600 kg/m","frequency_bending":"2 Hz","galloping_factor":1.2,"damping_ratio":"` + zeta + `","span":"12 m"},"fluid":"air","flow":{"speed":"25 m/s","turbulence_intensity":0.18,"turbulence_length":"80 m"}}`
	}
	a := answer(t, text("0.2 %"))
	for _, r := range []struct {
		id   group.ID
		want float64
	}{{group.GustBackground, 0.7833}, {group.GustResonance, 0.0401 * 0.2008 * 0.930}} {
		if x := a.Groups.Get(r.id); math.Abs(x/r.want-1) > 0.01 {
			t.Errorf("%s %.4g, want %.4g", group.Of(r.id).ID, x, r.want)
		}
	}
	little, much := estimateOf(a, assumption.QuasiStaticGusts, finding.Load), estimateOf(answer(t, text("2 %")), assumption.QuasiStaticGusts, finding.Load)
	if !(little > 5*much && much > 0) {
		t.Errorf("resonant share %g at 0.2 %% of damping, %g at 2 %%", little, much)
	}
	if v := a.Findings[assumption.QuasiStaticGusts.Index()].Verdict; v != finding.Invalid {
		t.Errorf("gusts on a mast of little damping: %s", v)
	}
}

// A criterion that a case picks decides in place of the model.
func TestWindCriteria(t *testing.T) {
	picked := answer(t, `{`+fmt.Sprintf(deck, "true")+`,"flow":{"speed":"73 m/s","operating":["30 m/s","73 m/s"]},"criteria":{"divergence":"en-1991-1-4-e4"}}`)
	f := picked.Findings[assumption.NoDivergence.Index()]
	// torsion at 2.73 times the frequency of bending: E.4.2(2) is not met
	if u, ok := f.Utilisation(); !ok || math.Abs(u-2/2.7255) > 1e-3 || f.Verdict != finding.Valid {
		t.Errorf("EN 1991-1-4 E.4 at %g: %s", u, f.Verdict)
	}
	gallops := answer(t, `{`+prism+`,"flow":{"speed":"1.4 m/s","operating":["1.3 m/s","1.4 m/s"]},"criteria":{"galloping":"en-1991-1-4-e2"}}`)
	f = gallops.Findings[assumption.NoGalloping.Index()]
	if u, ok := f.Utilisation(); !ok || math.Abs(u-1.25*1.4/1.4763) > 2e-3 || f.Verdict != finding.Invalid {
		t.Errorf("EN 1991-1-4 E.2 at %g: %s", u, f.Verdict)
	}
}

// The altitude of a wing sets the air by the standard atmosphere.
func TestAltitude(t *testing.T) {
	a := answer(t, `{"structure":{"kind":"wing","chord":"3 m","altitude":"11 km","mass_per_length":"300 kg/m","frequency_bending":"2 Hz"},"fluid":"air","flow":{"speed":"230 m/s"}}`)
	for _, r := range []struct {
		id   scale.ID
		want float64
	}{{scale.Density, 0.36391}, {scale.SoundSpeed, 295.07}, {scale.Viscosity, 1.4216e-5}, {scale.Pressure, 22632}} {
		if x := a.Scales.X(r.id); math.Abs(x/r.want-1) > 0.003 {
			t.Errorf("%s at 11 km is %g, want %g", scale.Of(r.id).ID, x, r.want)
		}
	}
}
