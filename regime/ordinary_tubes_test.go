package regime_test

import (
	"math"
	"strings"
	"testing"

	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
)

const tube = `"structure":{"kind":"tube_array","diameter":"19.05 mm","wall_thickness":"1.65 mm","pitch_ratio":1.5,"layout":"30","length":"1 m","material":"steel",` +
	`"contents_density":"998 kg/m3","damping_ratio_wet":0.015,"duct_width":"0.6 m"},"fluid":"water","motion":{"amplitude":"0.02 mm"}`

const turekHron = `"kind":"flag","length":"0.35 m","width":"350 m","thickness":"0.02 m","poisson_ratio":0.4,"linear_strain":0.1,"leading_body":"0.1 m"`
const benchmarkWater = `"fluid":{"density":"1000 kg/m3","kinematic_viscosity":"1e-3 m2/s","sound_speed":"1480 m/s","phase":"liquid","vapour_pressure":"2.3 kPa"}`

// Ordinary cases of tube arrays and flags, worked by hand.
func TestOrdinaryTubesAndFlags(t *testing.T) {
	// m = 0.708 + 0.581 kg/m; V_c = 3·50.0·0.01905·√(2π·0.015·1.289/(998.2·0.01905²)) wet; f_w 37.2 Hz
	rows := []ordinary{
		{"heat exchanger tube below half of the critical speed", `{` + tube + `,"flow":{"gap_speed":"0.55 m/s"}}`, "quasi-static-array", of(group.FluidelasticSpeed),
			0.55 / (3 * 37.2 * 0.01905 * math.Sqrt(2*math.Pi*0.015*1.289/(998.2*0.01905*0.01905))), 0.01},
		{"the same: added mass between the tubes", `{` + tube + `,"flow":{"gap_speed":"0.55 m/s"}}`, "quasi-static-array", of(group.AddedMassRatio),
			998 * math.Pi / 4 * (0.01575*0.01575 + 1.3585*0.01905*0.01905) / 0.708, 0.01},
		{"the same at 1 % of the critical speed", `{` + tube + `,"flow":{"gap_speed":"0.0123 m/s"}}`, "added-mass", of(group.FluidelasticSpeed), 0.01, 0.02},
		{"cloth flag at 5 m/s", `{"structure":{"kind":"flag","length":"1.5 m","width":"1 m","thickness":"0.35 mm","mass_per_area":"0.16 kg/m2","bending_stiffness":"1e-5 N m","linear_strain":0.02},"fluid":"air","flow":{"speed":"5 m/s"}}`,
			"two-way-implicit", of(group.Displacement), 0.2, 1e-9},
		{"FSI2", `{"structure":{` + turekHron + `,"density":"10000 kg/m3","young_modulus":"1.4 MPa"},` + benchmarkWater + `,"flow":{"speed":"1 m/s"}}`, "two-way-implicit", of(group.AddedMassRatio), 1.9, 0.03},
		{"FSI3", `{"structure":{` + turekHron + `,"density":"1000 kg/m3","young_modulus":"5.6 MPa"},` + benchmarkWater + `,"flow":{"speed":"2 m/s"}}`, "two-way-implicit", of(group.AddedMassRatio), 19, 0.03},
	}
	if ran := runOrdinary(t, rows); ran != 6 {
		t.Errorf("ran %d ordinary cases", ran)
	}
	a := answer(t, rows[0].text)
	if f := a.Findings[assumption.StillFluid.Index()]; f.Verdict != finding.Invalid {
		t.Errorf("a fluid at rest is %s for a tube at 45 %% of its critical speed", f.Verdict)
	}
}

// Each hazard on either side of its onset.
func TestOnsetsOfTubesFlagsAndNeighbours(t *testing.T) {
	stack := `{"structure":{"kind":"cylinder","diameter":"4 m","length":"60 m","wall_thickness":"8 mm","material":"steel","support":"clamped-free","damping_ratio":0.003},"fluid":"air","flow":{"speed":"%"}}`
	pair := `{"structure":{"kind":"cylinder","diameter":"0.1 m","length":"20 m","material":"steel","damping_ratio":0.01,"frequency_dry":"2 Hz"},"fluid":"air","flow":{"speed":"1 m/s"},"surroundings":{%}}`
	fast := strings.Replace(pair, `"speed":"1 m/s"`, `"speed":"5 m/s"`, 1)
	coils := `{"structure":{"kind":"tube_array","diameter":"38 mm","wall_thickness":"3.2 mm","pitch":"76 mm","layout":"90","strouhal":0.25,"length":"1.6 m","material":"steel","damping_ratio":0.004,"duct_width":"%"},` +
		`"fluid":{"density":"0.72 kg/m3","viscosity":"0.027 mPa s","sound_speed":"440 m/s","phase":"gas"},"flow":{"gap_speed":"12 m/s","operating":["11 m/s","12 m/s"]}}`
	rows := []struct {
		name, text, value string
		entry             *assumption.Entry
		want              finding.Verdict
	}{
		{"tubes", `{` + tube + `,"flow":{"gap_speed":"%"}}`, "0.75 m/s", assumption.NoFluidelasticInstability, finding.Valid},
		{"tubes", `{` + tube + `,"flow":{"gap_speed":"%"}}`, "1.2 m/s", assumption.NoFluidelasticInstability, finding.Marginal},
		{"tubes", `{` + tube + `,"flow":{"gap_speed":"%"}}`, "2 m/s", assumption.NoFluidelasticInstability, finding.Invalid},
		{"stack", stack, "8 m/s", assumption.NoOvalling, finding.Valid},
		{"stack", stack, "22 m/s", assumption.NoOvalling, finding.Invalid},
		{"tandem", pair, `"neighbour_spacing":"0.2 m","neighbour_arrangement":"tandem"`, assumption.NoWakeInterference, finding.Invalid},
		{"tandem", pair, `"neighbour_spacing":"0.38 m","neighbour_arrangement":"tandem"`, assumption.NoWakeInterference, finding.Marginal},
		{"tandem", pair, `"neighbour_spacing":"0.6 m","neighbour_arrangement":"tandem"`, assumption.NoWakeInterference, finding.Valid},
		{"wake galloping", fast, `"neighbour_spacing":"0.6 m","neighbour_arrangement":"tandem"`, assumption.NoWakeInterference, finding.Invalid},
		{"wake galloping", fast, `"neighbour_spacing":"1.4 m","neighbour_arrangement":"tandem"`, assumption.NoWakeInterference, finding.Valid},
		{"side by side", pair, `"neighbour_spacing":"0.15 m","neighbour_arrangement":"side-by-side"`, assumption.NoWakeInterference, finding.Invalid},
		{"side by side", pair, `"neighbour_spacing":"0.3 m","neighbour_arrangement":"side-by-side"`, assumption.NoWakeInterference, finding.Valid},
		{"staggered", pair, `"neighbour_spacing":"0.2 m","neighbour_angle":"45 deg"`, assumption.NoWakeInterference, finding.Invalid},
		{"alone", pair, ``, assumption.NoWakeInterference, finding.NotApplicable},
		{"coils", coils, "2.55 m", assumption.NoAcousticResonance, finding.Invalid},
		{"coils", coils, "1 m", assumption.NoAcousticResonance, finding.Valid},
		{"vane", `{"structure":{` + turekHron + `,"density":"10000 kg/m3","young_modulus":"1.4 MPa"},` + benchmarkWater + `,"flow":{"speed":"%"}}`, "0.2 m/s", assumption.NoLockIn, finding.NotApplicable},
		{"vane", `{"structure":{` + turekHron + `,"density":"10000 kg/m3","young_modulus":"1.4 MPa"},` + benchmarkWater + `,"flow":{"speed":"%"}}`, "1 m/s", assumption.NoLockIn, finding.Invalid},
		{"stiff vane", `{"structure":{` + turekHron + `,"density":"10000 kg/m3","young_modulus":"1.4 GPa"},` + benchmarkWater + `,"flow":{"speed":"%"}}`, "1 m/s", assumption.NoLockIn, finding.Valid},
	}
	for _, r := range rows {
		a := answer(t, strings.Replace(r.text, "%", r.value, 1))
		if f := &a.Findings[r.entry.Index()]; f.Verdict != r.want {
			u, _ := f.Utilisation()
			t.Errorf("%s, %s: %s is %s at %.3g, want %s", r.name, r.value, r.entry.ID, f.Verdict, u, r.want)
		}
	}
	if len(rows) != 19 {
		t.Errorf("ran %d rows", len(rows))
	}
}

// A picked criterion decides in place of the physical model, by its constant alone.
func TestFluidelasticCriteria(t *testing.T) {
	rows := []struct {
		pick string
		k    float64
	}{{"pettigrew-taylor-1991", 3}, {"asme-n1331-lower", 2.4}, {"asme-n1331-mean", 4}, {"connors-1970", 9.9}}
	for _, r := range rows {
		a := answer(t, `{`+tube+`,"flow":{"gap_speed":"1 m/s"},"criteria":{"fluidelastic":"`+r.pick+`","lock_in":"asme-n1324"}}`)
		f := &a.Findings[assumption.NoFluidelasticInstability.Index()]
		u, _ := f.Utilisation()
		if want := a.Groups.Get(group.FluidelasticSpeed) * 3 / r.k; math.Abs(u/want-1) > 1e-9 {
			t.Errorf("%s: %g, want %g", r.pick, u, want)
		}
	}
	if len(rows) != 4 {
		t.Errorf("ran %d rows", len(rows))
	}
}
