package similar_test

import (
	"math"
	"slices"
	"strings"
	"testing"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
	"regimed/regime/similar"
)

// A case that is written can be read again, and is the same case.
func TestAppendCase(t *testing.T) {
	cases := shipped(t)
	for name, doc := range map[string]string{
		"modes":    `{"structure": {"kind": "plate", "length": "1 m", "width": "1 m", "thickness": "5 mm", "material": "steel", "modes": [{"frequency_dry": "12 Hz", "damping_ratio": 0.01}, {"frequency_dry": "30 Hz"}]}, "fluid": "water"}`,
		"gauge":    `{"structure": {"kind": "generic", "length": "1 m"}, "fluid": {"name": "water", "pressure": "3 barg"}, "surroundings": {"ambient_pressure": "1 bar"}}`,
		"choices":  `{"title": "\"quoted\" \\ and é", "interest": ["frequency", "scale"], "structure": {"kind": "generic", "length": "1 m"}, "fluid": {"name": "seawater", "salinity": "35 psu"}, "tolerance": "screening"}`,
		"groups":   `{"structure": {"kind": "cylinder", "diameter": "50 mm"}, "fluid": {"density": "1000 kg/m3"}, "flow": {"speed": "1 m/s"}, "given_groups": {"reynolds": 3900}}`,
		"interval": `{"structure": {"kind": "generic", "length": "1 m"}, "fluid": "air", "flow": {"speed": "10 m/s", "operating": ["0 m/s", "30 m/s"], "incidence": "3 deg"}}`,
		"std":      `{"structure": {"kind": "generic", "length": "2 m +- 10 %", "damping_ratio": {"value": 0.01, "std": 0.002}}, "fluid": "air"}`,
	} {
		cases[name] = decode(t, doc)
	}
	for name, c := range cases {
		written := similar.AppendCase(nil, c)
		if again := decode(t, string(written)); again.Digest() != c.Digest() {
			t.Errorf("%s is another case:\n%s\n%s", name, written, c.Canonical(nil))
		}
	}
	if len(cases) < 46 {
		t.Errorf("%d cases", len(cases))
	}
	c := decode(t, `{"structure": {"kind": "generic", "length": "1.8 .. 2.4 m", "strouhal": {"low": 0.18, "high": 0.22}}}`)
	if got := string(similar.AppendCase(nil, c)); got != `{"structure":{"kind":"generic","length":{"low":1.8,"high":2.4,"unit":"m"},"strouhal":{"low":0.18,"high":0.22}}}` {
		t.Error(got)
	}
}

// valueOf is what stands at a path of the model.
func valueOf(t *testing.T, s *similar.Scaling, path string) float64 {
	t.Helper()
	p, err := s.Model.Case.FindPlace(path)
	if err != nil {
		t.Fatal(err)
	}
	q := s.Model.Case.At(p)
	if q == nil {
		return math.NaN()
	}
	return q.Value
}

// The model's case: each quantity by its own factor, in the model by Froude and
// Cauchy at 1:25, λ = 0.04, √λ = 0.2.
func TestModelFields(t *testing.T) {
	const everything = `{"structure": {"kind": "cylinder", "diameter": "1 m", "length": "20 m", "mass_per_length": "900 kg/m", "bending_stiffness": "50 MN m2", "contents_density": "850 kg/m3", "contents_included": true, "wall_thickness": "20 mm",
		"tension": "10 kN", "support": "elastic", "support_stiffness": "2 MN m/rad", "roughness": "0.1 mm", "young_modulus": "200 GPa", "modes": [{"frequency_dry": "2 Hz", "damping_ratio": 0.01}]},
		"fluid": "water", "flow": {"speed": "2 m/s +- 0.1 m/s", "operating": ["0 m/s", "3 m/s"], "turbulence_intensity": 0.1, "turbulence_length": "5 m", "incidence": "0 deg"},
		"waves": {"height": "1 m", "period": "5 s", "depth": "30 m", "air_gap": "4 m"}, "motion": {"amplitude": "0.1 m", "frequency": "0.5 Hz"}, "surroundings": {"wall_gap": "2 m"}}`
	s := scaled(t, request(t, everything, "length 1:25", "froude cauchy", ""))
	rows := []struct {
		path string
		want float64
	}{
		{"structure.diameter", 0.04}, {"structure.length", 0.8}, {"structure.mass_per_length", 900 * 0.0016}, {"structure.bending_stiffness", 5e7 * math.Pow(0.04, 5)},
		{"structure.contents_density", 850}, {"structure.tension", 1e4 * math.Pow(0.04, 3)}, {"structure.support_stiffness", 2e6 * math.Pow(0.04, 4)},
		{"structure.roughness", 4e-6}, {"structure.young_modulus", 8e9}, {"structure.modes.0.frequency_dry", 10}, {"structure.modes.0.damping_ratio", 0.01},
		{"flow.speed", 0.4}, {"flow.operating.1", 0.6}, {"flow.turbulence_intensity", 0.1}, {"flow.turbulence_length", 0.2}, {"flow.incidence", 0},
		{"waves.height", 0.04}, {"waves.period", 1}, {"waves.depth", 1.2}, {"waves.air_gap", 0.16}, {"motion.amplitude", 0.004}, {"motion.frequency", 2.5}, {"surroundings.wall_gap", 0.08},
	}
	for _, row := range rows {
		if got := valueOf(t, s, row.path); math.Abs(got-row.want) > 1e-11*math.Abs(row.want) {
			t.Errorf("%s is %v, not %v", row.path, got, row.want)
		}
	}
	if len(rows) != 23 || len(s.Model.Violations) > 0 {
		t.Errorf("%d rows, %v", len(rows), s.Model.Violations)
	}
	p, _ := s.Model.Case.FindPlace("flow.speed")
	if q := s.Model.Case.At(p); math.Abs(q.Spread-0.02) > 1e-12 || q.Form.String() != "normal" {
		t.Errorf("the spread of the speed: %+v", q)
	}
	if v := s.Model.Case.Lookup(kind.Title); v == nil || v.Text != "model 1:25" {
		t.Errorf("title %+v", v)
	}
	if again := decode(t, string(similar.AppendCase(nil, s.Model.Case))); again.Digest() != s.Model.Case.Digest() {
		t.Error("what is written is not what was judged")
	}
}

// Static pressures: kept with the cavitation number, or left to the surroundings.
func TestModelPressures(t *testing.T) {
	const (
		foil  = `{"structure": {"kind": "generic", "length": "0.5 m"}, "flow": {"speed": "10 m/s"}, `
		water = `"fluid": {"density": "1000 kg/m3", "viscosity": "1 mPa s", "vapour_pressure": "2 kPa", "phase": "liquid"`
	)
	rows := []struct {
		name, doc, given, keep string
		want                   map[string]float64
	}{
		{"depressurised tank", foil + water + `}, "surroundings": {"depth_below_surface": "2 m"}}`, "length 1:4", "froude cavitation",
			map[string]float64{"surroundings.ambient_pressure": 2000 + (101325-2000)/4.0}},
		{"a pressure that was given", foil + water + `, "pressure": "150 kPa"}}`, "length 1:4", "froude cavitation",
			map[string]float64{"fluid.pressure": 2000 + 148000/4.0, "surroundings.ambient_pressure": 2000 + (101325-2000)/4.0}},
		{"the same speed needs no other pressure", foil + water + `}, "surroundings": {"depth_below_surface": "2 m"}}`, "length 1:4 speed 1", "cavitation",
			map[string]float64{"surroundings.ambient_pressure": 101325 + 1000*9.80665*(2-0.5)}},
		{"not kept: the surroundings stay", foil + water + `, "pressure": "150 kPa"}}`, "length 1:4", "froude",
			map[string]float64{"fluid.pressure": 101325 + (150000-101325)/4.0, "surroundings.ambient_pressure": math.NaN()}},
		{"gauge", foil + water + `, "pressure": "50 kPag"}, "surroundings": {"ambient_pressure": "100 kPa"}}`, "length 1:4", "froude",
			map[string]float64{"fluid.pressure": 12500, "surroundings.ambient_pressure": 100000}},
		{"gauge, kept", foil + water + `, "pressure": "50 kPag"}, "surroundings": {"ambient_pressure": "100 kPa"}}`, "length 1:4", "froude cavitation",
			map[string]float64{"fluid.pressure": 12500, "surroundings.ambient_pressure": 2000 + 98000/4.0}},
		{"a gas stays at its pressure", foil + `"fluid": {"name": "air", "pressure": "3 bar"}}`, "length 1:4", "reynolds", map[string]float64{"fluid.pressure": 3e5}},
	}
	checked := 0
	for _, row := range rows {
		s := scaled(t, request(t, row.doc, row.given, row.keep, ""))
		for path, want := range row.want {
			got := valueOf(t, s, path)
			if checked++; math.IsNaN(want) != math.IsNaN(got) || math.Abs(got-want) > 1e-9*math.Abs(want) {
				t.Errorf("%s: %s is %v, not %v", row.name, path, got, want)
			}
		}
		if strings.Contains(row.keep, "cavitation") {
			if p := s.Comparison.Group(group.Cavitation); p == nil || math.Abs(p.Factor-1) > 1e-9 {
				t.Errorf("%s: cavitation number %+v", row.name, p)
			}
		}
	}
	if len(rows) != 7 || checked != 11 {
		t.Errorf("%d rows, %d checked", len(rows), checked)
	}
	// collapse of a vessel goes by the difference of two pressures
	s := scaled(t, request(t, `{"structure": {"kind": "vessel", "radius": "10 mm", "wall_thickness": "1 mm", "young_modulus": "0.5 MPa", "density": "1100 kg/m3", "length": "0.4 m", "pulse_frequency": "1.2 Hz", "external_pressure": "103 kPa"},
		"fluid": "blood", "flow": {"speed": "0.2 m/s"}}`, "length 2:1", "reynolds", ""))
	if got, want := valueOf(t, s, "structure.external_pressure"), 101325+(103000-101325)/4.0; math.Abs(got/want-1) > 1e-11 {
		t.Errorf("external pressure %v, not %v", got, want)
	}
}

// The model in another fluid: by name, by values as needed, and by a factor.
func TestModelFluid(t *testing.T) {
	r := request(t, strings.Replace(pile, `"water", "temperature": "10 degC"`, `"seawater"`, 1), "length 1:30", "froude mass_ratio", "")
	r.Fluid = fluidOf(t, `{"name": "water", "temperature": "20 degC"}`)
	s := scaled(t, r)
	a, b := s.Prototype.Scales, s.Model.Answer.Scales
	for f, id := range map[similar.Factor]scale.ID{similar.FluidDensity: scale.Density, similar.KinematicViscosity: scale.KinematicViscosity, similar.SoundSpeed: scale.SoundSpeed, similar.SurfaceTension: scale.SurfaceTension} {
		if got := s.Factors[f]; got.Origin != similar.OfFluids || math.Abs(b.X(id)/a.X(id)/got.Value-1) > 1e-12 {
			t.Errorf("%s: %+v", similar.FactorOf(f).ID, got)
		}
	}
	if got := formulas(s); got["mass"] != "λ^3 λ_ρ" || got["force"] != "λ^3 λ_ρ" || got["pressure"] != "λ λ_ρ" {
		t.Errorf("%v", got)
	}
	if p := s.Comparison.Group(group.MassRatio); p == nil || math.Abs(p.Factor-1) > 1e-9 {
		t.Errorf("mass ratio %+v", p)
	}
	if s.Model.Case.Choice(kind.FluidName, "") != "water" {
		t.Errorf("%s", similar.AppendCase(nil, s.Model.Case))
	}

	s = scaled(t, request(t, pile, "length 1:30", "froude reynolds", "kinematic_viscosity"))
	if got, want := s.Model.Answer.Scales.X(scale.KinematicViscosity)/s.Prototype.Scales.X(scale.KinematicViscosity), math.Pow(30, -1.5); math.Abs(got/want-1) > 1e-9 {
		t.Errorf("ν is %v of what it was, not %v", got, want)
	}
	if s.Model.Case.Has(kind.FluidName) || s.Model.Case.Choice(kind.FluidPhase, "") != "liquid" || !noted(s, "fluid-by-values") {
		t.Errorf("%s", similar.AppendCase(nil, s.Model.Case))
	}
	if p := s.Comparison.Group(group.Reynolds); p == nil || math.Abs(p.Factor-1) > 1e-9 {
		t.Errorf("Reynolds number %+v", p)
	}

	// the altitude is that of the air, and no length of the wing
	wing := shipped(t)["survey-wing.json"]
	rw := similar.NewRequest(wing)
	rw.Given[similar.Length] = 0.1
	sw := scaled(t, rw)
	if got := valueOf(t, sw, "structure.altitude"); got != 4000 {
		t.Errorf("altitude %v", got)
	}
	rw.Given[similar.FluidDensity] = 2
	sw = scaled(t, rw)
	if got := sw.Model.Answer.Scales; got.X(scale.Density) != 2*sw.Prototype.Scales.X(scale.Density) && math.Abs(got.X(scale.Density)/sw.Prototype.Scales.X(scale.Density)-2) > 1e-9 || got.X(scale.Pressure) != rounded(sw.Prototype.Scales.X(scale.Pressure)) {
		t.Errorf("by values: %s", similar.AppendCase(nil, sw.Model.Case))
	}
	rw.Given[similar.FluidDensity] = math.NaN()
	rw.Fluid = fluidOf(t, `"water"`)
	if sw = scaled(t, rw); !noted(sw, "altitude-dropped") || sw.Model.Case.Choice(kind.FluidName, "") != "water" {
		t.Errorf("in water: %s", similar.AppendCase(nil, sw.Model.Case))
	}
}

// rounded is a number to twelve digits.
func rounded(x float64) float64 {
	unit := math.Pow(10, 11-math.Floor(math.Log10(x)))
	return math.Round(x*unit) / unit
}

func noted(s *similar.Scaling, code string) bool {
	return slices.ContainsFunc(s.Notes, func(w kind.Warning) bool { return w.Code == code })
}

// fluidOf reads a fluid by itself.
func fluidOf(t *testing.T, fluid string) []input.Value {
	t.Helper()
	var list []input.Value
	for _, v := range decode(t, `{"structure": {"kind": "generic", "length": "1 m"}, "fluid": `+fluid+`}`).Given() {
		if v.Field.Of == "fluid" {
			list = append(list, v)
		}
	}
	return list
}

// Groups that stand for a quantity go on, each by its own factor.
func TestModelOfGivenGroups(t *testing.T) {
	s := scaled(t, request(t, `{"structure": {"kind": "cylinder", "diameter": "50 mm"}, "fluid": {"density": "1000 kg/m3", "phase": "liquid"}, "flow": {"speed": "1 m/s"}, "given_groups": {"reynolds": 3900, "mass_ratio": 2.4}}`, "length 1:4", "froude", ""))
	if got := valueOf(t, s, "given_groups.reynolds"); math.Abs(got-3900/8.0) > 1e-9 {
		t.Errorf("Reynolds number %v", got)
	}
	if got := valueOf(t, s, "given_groups.mass_ratio"); got != 2.4 {
		t.Errorf("mass ratio %v", got)
	}
	if a, b := s.Prototype.Scales.X(scale.KinematicViscosity), s.Model.Answer.Scales.X(scale.KinematicViscosity); math.Abs(b/a-1) > 1e-11 {
		t.Errorf("ν %v and %v", a, b)
	}
}

// What contradicts itself is said at its place; what makes no case is said of the
// model.
func TestScaleRefuses(t *testing.T) {
	gas := `{"structure": {"kind": "generic", "length": "1 m"}, "fluid": "air", "flow": {"speed": "10 m/s"}}`
	bare := `{"structure": {"kind": "generic", "length": "1 m"}, "fluid": {"density": "1000 kg/m3", "viscosity": "1 mPa s", "phase": "liquid"}, "flow": {"speed": "10 m/s"}}`
	rows := []struct {
		name, doc, given, keep, free, fluid string
		want                                []string
	}{
		{"no length", gas, "", "mach", "", "", []string{"/length missing"}},
		{"a result", gas, "length 1:2", "mach drag_coefficient", "", "", []string{"/keep/1 unknown-choice"}},
		{"twice", gas, "length 1:2", "mach mach", "", "", []string{"/keep/1 duplicate"}},
		{"free and given", gas, "length 1:2 gravity 2", "", "gravity", "", []string{"/free/0 contradiction"}},
		{"a fluid and its density", gas, "length 1:2 fluid_density 2", "", "sound_speed", `"helium"`, []string{"/fluid_density contradiction", "/free/0 contradiction"}},
		{"pressure of a gas", gas, "length 1:2 static_pressure 2", "", "", "", []string{"/static_pressure contradiction"}},
		{"a fluid out of its range", gas, "length 1:2", "", "", `{"name": "water", "temperature": "700 K"}`, []string{"/fluid/temperature out-of-range"}},
		{"no fluid to replace", `{"structure": {"kind": "generic", "length": "1 m"}}`, "length 1:2", "", "", `"water"`, []string{"/fluid contradiction"}},
		{"a surface on a gas", `{"structure": {"kind": "tank", "length": "1 m", "liquid_depth": "0.5 m"}, "fluid": "water"}`, "length 1:2", "", "", `"air"`, []string{"/fluid/phase contradiction"}},
		{"a property that is not known", bare, "length 1:2", "mach weber", "", `{"density": "900 kg/m3", "viscosity": "2 mPa s", "phase": "liquid"}`, []string{"/keep/0 missing", "/keep/1 missing"}},
		{"no vapour pressure", bare, "length 1:2", "cavitation", "", "", []string{"/keep/0 missing"}},
		{"a case that contradicts itself", strings.Replace(gas, `, "flow"`, `, "surroundings": {"shell_diameter": "0.5 m"}, "flow"`, 1), "length 1:2", "", "", "", []string{"/case/surroundings/shell_diameter contradiction"}},
	}
	ran := 0
	for _, row := range rows {
		r := request(t, row.doc, row.given, row.keep, row.free)
		if row.fluid != "" {
			r.Fluid = fluidOf(t, row.fluid)
		}
		s, violations := similar.Scale(r)
		var got []string
		for _, v := range violations {
			got = append(got, v.Pointer+" "+string(v.Code))
		}
		if s != nil || !slices.Equal(got, row.want) {
			t.Errorf("%s: %v, not %v", row.name, got, row.want)
		}
		ran++
	}
	if ran != 12 {
		t.Errorf("%d rows", ran)
	}
	r := request(t, gas, "length 1:2", "", "")
	r.Tolerance = math.NaN()
	r.Given[similar.Speed] = -1
	if _, violations := similar.Scale(r); len(violations) != 2 {
		t.Errorf("%v", violations)
	}

	// a model whose surroundings would have to be below a vacuum: deep water, and the speed of the prototype
	s := scaled(t, request(t, `{"structure": {"kind": "generic", "length": "1 m"}, "fluid": "water", "flow": {"speed": "10 m/s"}, "surroundings": {"depth_below_surface": "9 m"}}`,
		"length 20:1 speed 1", "cavitation", ""))
	if s.Comparison != nil || len(s.Model.Violations) != 1 || s.Model.Violations[0].Pointer != "/surroundings/ambient_pressure" {
		t.Errorf("%v", s.Model.Violations)
	}
	// a model in which water freezes or sound is out of range is no case, and no fault
	s = scaled(t, request(t, `{"structure": {"kind": "film", "length": "1 mm", "width": "1 mm", "gap": "2 um", "moving_mass": "1 mg", "frequency_dry": "1 kHz"}, "fluid": "air"}`, "length 1e-25", "", ""))
	if s.Comparison != nil && len(s.Model.Violations) > 0 {
		t.Errorf("judged, and %v", s.Model.Violations)
	}
}

// A title that is as long as it may be stays one.
func TestModelTitle(t *testing.T) {
	long := strings.Repeat("é", 99) + "ab"
	s := scaled(t, request(t, `{"title": "`+long+`", "structure": {"kind": "generic", "length": "1 m"}}`, "length 2.5", "", ""))
	title := s.Model.Case.Choice(kind.Title, "")
	if !strings.HasSuffix(title, " (model 2.5:1)") || len(title) > 200 || len(s.Model.Violations) > 0 {
		t.Errorf("%d bytes: %s", len(title), title)
	}
	if _, violations := regime.Classify(decode(t, string(similar.AppendCase(nil, s.Model.Case)))); len(violations) > 0 {
		t.Error(violations)
	}
}

// Scales, as people write them.
func TestParseRatio(t *testing.T) {
	rows := []struct {
		text string
		want float64 // NaN: refused
	}{
		{"1:40", 0.025}, {"1/40", 0.025}, {"0.025", 0.025}, {" 1 : 40 ", 0.025}, {"40:1", 40}, {"1.5:3", 0.5}, {"1e-3", 1e-3},
		{"", math.NaN()}, {"0", math.NaN()}, {"-1", math.NaN()}, {"1:0", math.NaN()}, {"1:-40", math.NaN()}, {"1:", math.NaN()}, {":40", math.NaN()},
		{"NaN", math.NaN()}, {"Inf", math.NaN()}, {"1e400", math.NaN()}, {"1:2:3", math.NaN()}, {"a:b", math.NaN()}, {"1e-300", math.NaN()}, {"1e-20:1e20", math.NaN()},
	}
	for _, row := range rows {
		x, ok := similar.ParseRatio(row.text)
		if ok != !math.IsNaN(row.want) || ok && math.Abs(x/row.want-1) > 1e-15 {
			t.Errorf("%q is %v, %v", row.text, x, ok)
		}
	}
	if len(rows) != 21 {
		t.Errorf("%d rows", len(rows))
	}
	for x, want := range map[float64]string{0.025: "1:40", 1: "1:1", 2.5: "2.5:1", 1.0 / 3: "1:3"} {
		if got := similar.Ratio(x); got != want {
			t.Errorf("%v is %s", x, got)
		}
	}
}

// Every name that can be given is found, and every field of every kind that has a
// dimension has a quantity, or a reason to stay.
func TestEveryFieldHasAQuantity(t *testing.T) {
	for _, name := range similar.FactorNames() {
		if _, known := similar.FindFactor(name); !known {
			t.Errorf("%s is not found", name)
		}
	}
	if _, known := similar.FindFactor("heat_capacity_ratio"); known || len(similar.FactorNames()) != 11 || len(similar.FreeNames()) != 6 {
		t.Errorf("%v %v", similar.FactorNames(), similar.FreeNames())
	}
	stay := map[string]bool{"structure.altitude": true, "structure.external_pressure": true}
	n := 0
	for _, b := range append(slices.Clone(kind.Schema().Kinds), kind.Schema().Blocks...) {
		for _, f := range b.Fields {
			if f.Type != input.Quantity && f.Type != input.Interval || f.Of == "fluid" || f.Of == "surroundings" && f.Kind.SI() == "Pa" && f.Name == "ambient_pressure" {
				continue
			}
			n++
			mass, length, time := f.Kind.Exponents()
			electrical := f.Kind.SI() == "ohm" || f.Kind.SI() == "F" || f.Kind.SI() == "T m"
			if has := similar.HasQuantity(input.Place{Field: f}); has == stay[f.Path()] && (mass != 0 || length != 0 || time != 0 || electrical) {
				t.Errorf("%s: %v", f.Path(), has)
			}
		}
	}
	if n < 150 {
		t.Errorf("%d fields", n)
	}
}
