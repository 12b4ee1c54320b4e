package setup_test

import (
	"fmt"
	"math"
	"testing"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
	"regimed/regime/setup"
)

func figures(t *testing.T, text string) (*regime.Answer, map[string]setup.Figure) {
	t.Helper()
	c, violations, err := input.Decode([]byte(text), kind.Schema())
	if err != nil || len(violations) > 0 {
		t.Fatalf("%v %v", err, violations)
	}
	a, violations := regime.Classify(c)
	if len(violations) > 0 {
		t.Fatal(violations)
	}
	m := map[string]setup.Figure{}
	for _, f := range a.Setup {
		m[f.Row.ID] = f
	}
	return a, m
}

// A cylinder of 0.1 m in water at 1 m/s whose wake is resolved: the figures are
// worked by hand from the rules.
func TestFiguresOfAResolvedWake(t *testing.T) {
	a, m := figures(t, `{"structure":{"kind":"generic","length":"0.1 m","span":"1 m","mass":"8 kg","volume":"7.854 L","frequency_dry":"30 Hz","damping_ratio":"1 %","strouhal":0.2,"galloping_factor":-1},
		"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","sound_speed":"1500 m/s","vapour_pressure":"2 kPa"},"flow":{"speed":"1 m/s","turbulence_intensity":0.3},"motion":{"amplitude":"0.1 mm"}}`)
	if a.Recommendation.Class.ID != "unsteady-load" {
		t.Fatalf("class %s", a.Recommendation.Class.ID)
	}
	re := 1e5
	cf := 0.66411 / math.Sqrt(re)
	for id, want := range map[string]float64{
		"time_step_shedding":  0.1 / 0.2 / 100,
		"time_step_courant":   0.1 / 50 / 1,
		"duration_shedding":   20 * 0.1 / 0.2,
		"first_cell_resolved": 1e-6 / math.Sqrt(cf/2),
		"domain_downstream":   3,
	} {
		f, ok := m[id]
		if !ok {
			t.Errorf("no figure %s", id)
			continue
		}
		if math.Abs(f.Value/want-1) > 1e-3 {
			t.Errorf("%s is %g, want %g", id, f.Value, want)
		}
	}
	least, governing := math.Inf(1), 0
	for _, f := range a.Setup {
		if f.Row.Purpose == setup.TimeStep {
			least = math.Min(least, f.Value)
			if f.Governs {
				governing++
			}
		}
	}
	if governing != 1 {
		t.Errorf("%d time steps govern", governing)
	}
	for _, f := range a.Setup {
		if f.Row.Purpose == setup.TimeStep && f.Governs && f.Value != least {
			t.Errorf("%s governs at %g, the least is %g", f.Row.ID, f.Value, least)
		}
	}
}

// Starting relaxation and iterations of an implicit scheme follow from μ.
func TestFiguresOfAnImplicitScheme(t *testing.T) {
	a, m := figures(t, `{"structure":{"kind":"plate","length":"0.3 m","width":"0.3 m","thickness":"0.5 mm","density":"1100 kg/m3","young_modulus":"2 MPa","edges":"CFFF","damping_ratio":"1 %"},
		"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","sound_speed":"1500 m/s","vapour_pressure":"2 kPa"},"flow":{"speed":"1 m/s"}}`)
	if a.Recommendation.Class.ID != "two-way-implicit" {
		t.Fatalf("class %s", a.Recommendation.Class.ID)
	}
	mu := 1/m["relaxation"].Value - 1
	if got := m["relaxation_limit"].Value; math.Abs(got-2/(1+mu)) > 1e-12 {
		t.Errorf("limit of the relaxation %g at μ = %g", got, mu)
	}
	want := math.Ceil(math.Log(1e-3) / math.Log(mu/(2+mu)))
	if got := m["coupling_iterations"].Value; got != want {
		t.Errorf("%g iterations at μ = %g, want %g", got, mu, want)
	}
}

// The time step of the structure follows the faster of the wet mode and of the
// motion that is forced on it.
func TestTimeStepOfAForcedMotion(t *testing.T) {
	const rows = 2
	ran := 0
	for _, forced := range []float64{0.5, 400} {
		a, m := figures(t, fmt.Sprintf(`{"structure":{"kind":"generic","length":"0.1 m","mass":"8 kg","volume":"1 L","frequency_dry":"30 Hz"},
			"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","sound_speed":"1500 m/s","vapour_pressure":"2 kPa"},"motion":{"amplitude":"0.1 mm","frequency":"%g Hz"}}`, forced))
		want := 1 / (20 * math.Max(forced, a.Scales.X(scale.FrequencyWet)))
		if got := m["time_step_structure"].Value; math.Abs(got/want-1) > 1e-12 {
			t.Errorf("forced at %g Hz: %g s, want %g", forced, got, want)
		}
		ran++
	}
	if ran != rows {
		t.Errorf("ran %d rows, want %d", ran, rows)
	}
}

// Every row says what it is, by which rule, and whose.
func TestRowsAreComplete(t *testing.T) {
	seen := map[string]bool{}
	for i := range setup.Rows {
		r := &setup.Rows[i]
		if r.ID == "" || r.Title == "" || r.Rule == "" || r.Source == nil || seen[r.ID] {
			t.Errorf("row %q lacks something, or is there twice", r.ID)
		}
		seen[r.ID] = true
	}
	if len(seen) < 20 {
		t.Errorf("%d rows", len(seen))
	}
}
