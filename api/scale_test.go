package api

import (
	"math"
	"net/http"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"

	"regimed/regime/similar"
)

// scalingAnswer is a scaling as a client reads it.
type scalingAnswer struct {
	Consistent bool
	Factors    []struct {
		ID        string
		Value     *float64
		Formula   string
		Exponents map[string]string
		Origin    string
		Rule      string
	}
	Quantities []struct {
		ID      string
		Value   *float64
		Formula string
		RestsOn []string `json:"rests_on"`
	}
	Keep        []KeepRecord
	Exclusions  []ExclusionRecord
	Assumptions []RuleRecord
	Fields      []ScaledFieldRecord
	Case        map[string]any
	Violations  []ViolationItem
	Comparison  *ComparisonRecord
	Notes       []NoteRecord
}

func scale(t *testing.T, body string) *scalingAnswer {
	t.Helper()
	r := call(t, http.MethodPost, "/v1/scale", body)
	data := bodyOf(t, r)
	var s scalingAnswer
	if err := json.Unmarshal(data, &s, json.MatchCaseInsensitiveNames(true)); err != nil || r.StatusCode != http.StatusOK {
		t.Fatalf("status %d: %v\n%s", r.StatusCode, err, data)
	}
	return &s
}

func TestScale(t *testing.T) {
	s := scale(t, `{"case": `+riser+`, "length": "1:40", "keep": ["froude", "cauchy"]}`)
	if !s.Consistent || len(s.Factors) != int(similar.FactorCount) || len(s.Keep) != 2 || len(s.Assumptions) == 0 || len(s.Fields) == 0 || s.Comparison == nil || len(s.Violations) > 0 {
		t.Fatalf("%+v", s)
	}
	speed := s.Factors[similar.Speed]
	if speed.ID != "speed" || speed.Formula != "λ^(1/2)" || speed.Exponents["length"] != "1/2" || len(speed.Exponents) != 1 || math.Abs(*speed.Value-math.Sqrt(0.025)) > 1e-15 || speed.Origin != "follows" {
		t.Errorf("%+v", speed)
	}
	if mach := s.Comparison; mach.A.Title != "Riser" || mach.B.Title != "Riser (model 1:40)" {
		t.Errorf("%+v", mach)
	}
	// the model's case is one that can be classified
	body, err := json.Marshal(s.Case)
	if err != nil {
		t.Fatal(err)
	}
	r := call(t, http.MethodPost, "/v1/classify", string(body))
	var a struct{ Digest string }
	if err := json.Unmarshal(bodyOf(t, r), &a, json.MatchCaseInsensitiveNames(true)); err != nil || r.StatusCode != http.StatusOK || a.Digest != s.Comparison.B.Digest {
		t.Errorf("status %d, digest %s of %s", r.StatusCode, a.Digest, body)
	}
}

func TestScaleExcludes(t *testing.T) {
	s := scale(t, `{"case": `+riser+`, "length": 0.025, "keep": ["froude", "reynolds"]}`)
	if s.Consistent || len(s.Exclusions) != 1 || s.Exclusions[0].LetGo != "reynolds" || len(s.Exclusions[0].Remedies) != 3 || s.Keep[1].Held || s.Comparison == nil {
		t.Fatalf("%+v", s)
	}
	m := s.Exclusions[0].Remedies[1]
	if m.Factor != "kinematic_viscosity" || m.Formula != "λ^(3/2)" || *m.Now != 1 || math.Abs(1 / *m.Needed - 252.98) > 0.01 || *m.Change != *m.Needed {
		t.Errorf("%+v", m)
	}
	// with a fluid that may change they go together
	s = scale(t, `{"case": `+riser+`, "length": 0.025, "keep": ["froude", "reynolds"], "free": ["fluid"]}`)
	if !s.Consistent || s.Factors[similar.KinematicViscosity].Formula != "λ^(3/2)" || s.Factors[similar.FluidDensity].Origin != "assumed" || s.Factors[similar.FluidDensity].Rule != "same-fluid-density" {
		t.Errorf("%+v", s.Factors)
	}
}

// A property that one of the fluids lacks is null, and what hangs on it.
func TestScaleWithoutAProperty(t *testing.T) {
	s := scale(t, `{"case": {"structure": {"kind": "generic", "length": "1 m", "frequency_dry": "1 Hz"}, "fluid": {"density": "1000 kg/m3", "viscosity": "1 mPa s"}, "flow": {"speed": "1 m/s"}},
		"length": 0.5, "keep": ["reynolds"], "fluid": {"density": "900 kg/m3", "kinematic_viscosity": "5 cSt"}}`)
	c, nu := s.Factors[similar.SoundSpeed], s.Factors[similar.KinematicViscosity]
	if c.Value != nil || c.Origin != "unknown" || nu.Value == nil || math.Abs(*nu.Value-5) > 1e-12 || nu.Origin != "fluids" {
		t.Errorf("%+v %+v", c, nu)
	}
}

// A model that is no case says so, and is no problem of the request.
func TestScaleToNoCase(t *testing.T) {
	s := scale(t, `{"case": {"structure": {"kind": "generic", "length": "1 m"}, "fluid": "water", "flow": {"speed": "10 m/s"}, "surroundings": {"depth_below_surface": "9 m"}},
		"length": "20:1", "speed": 1, "keep": ["cavitation"]}`)
	if s.Comparison != nil || len(s.Violations) != 1 || s.Violations[0].Pointer != "/surroundings/ambient_pressure" || s.Keep[0].Judged != nil {
		t.Errorf("%+v", s)
	}
}

func TestScaleRefuses(t *testing.T) {
	with := func(members string) string { return `{"case": ` + rodCase + members + `}` }
	rows := []struct {
		name, body string
		want       []string
	}{
		{"nothing", `{}`, []string{"/case missing"}},
		{"text", `"1:40"`, []string{" wrong-type"}},
		{"everything", with(`, "length": "forty", "keep": ["froud", 3, "strouhal"], "free": "fluid", "fluid": "wodka", "tolerance": null, "lenght": 1`),
			[]string{"/fluid unknown-choice", "/free wrong-type", "/keep wrong-type", "/lenght unknown-field", "/length wrong-type", "/tolerance wrong-type"}},
		{"lengths", with(`, "length": 0`), []string{"/length wrong-type"}},
		{"below zero", with(`, "length": -0.1, "speed": "1:0", "time": {}, "gravity": 1e999`), []string{"/gravity wrong-type", "/length wrong-type", "/speed wrong-type", "/time wrong-type"}},
		{"too small to compute with", with(`, "length": 1e-200`), []string{"/length out-of-range"}},
		{"names", with(`, "length": 1, "keep": ["froud", "froude", "drag_coefficient"], "free": ["fluidd", "length", "gravity", "gravity"]`),
			[]string{"/free/0 unknown-choice", "/free/1 unknown-choice", "/keep/0 unknown-choice", "/keep/2 unknown-choice"}},
		{"a long name", with(`, "length": 1, "keep": ["` + strings.Repeat("x", 5000) + `"]`), []string{"/keep/0 unknown-choice"}},
		{"many names", with(`, "length": 1, "keep": [` + strings.Repeat(`"froude",`, 64) + `"mach"]`), []string{"/keep wrong-type"}},
		{"twice", with(`, "length": 1, "keep": ["mach", "froude", "mach"]`), []string{"/keep/2 duplicate"}},
		{"fluid", with(`, "length": 1, "fluid": {"density": "1 kg", "colour": "red"}`), []string{"/fluid/colour unknown-field", "/fluid/density wrong-dimension"}},
		{"no fluid in it", with(`, "length": 1, "fluid": {}`), []string{"/fluid missing"}},
		{"fluid out of its range", with(`, "length": 1, "fluid": {"name": "seawater", "temperature": "90 degC"}`), []string{"/fluid/temperature out-of-range"}},
		{"no length", with(`, "keep": ["mach"]`), []string{"/length missing"}},
		{"a bad case", `{"case": {"structure": {"kind": "cylinder", "diameter": "1 kg"}}, "length": 1}`, []string{"/case/structure/diameter wrong-dimension"}},
		{"a case that contradicts itself", `{"case": {"structure": {"kind": "generic", "length": "1 m"}, "flow": {"speed": "1 m/s"}}, "length": 1}`, []string{"/case/fluid missing"}},
	}
	ran := 0
	for _, row := range rows {
		checkRefused(t, "/v1/scale", row.name, row.body, row.want)
		ran++
	}
	if ran != 16 {
		t.Errorf("%d rows", ran)
	}
	checkMalformed(t, "/v1/scale")
	p := problemIn(t, call(t, http.MethodPost, "/v1/scale", with(`, "length": 1, "keep": ["reynold"]`)))
	if !strings.Contains(p.Violations[0].Detail, "Did you mean reynolds?") || !strings.Contains(p.Violations[0].Detail, "mass_ratio") {
		t.Errorf("%+v", p.Violations)
	}
}
