package similar_test

import (
	"fmt"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/similar"
)

// decode reads a case.
func decode(t testing.TB, doc string) *input.Case {
	t.Helper()
	c, violations, err := input.Decode([]byte(doc), kind.Schema())
	if err != nil || len(violations) > 0 {
		t.Fatalf("%v %v\n%s", err, violations, doc)
	}
	return c
}

// pile is a steel pile across a current below a free surface.
const pile = `{"structure": {"kind": "cylinder", "diameter": "1.2 m", "length": "18 m", "wall_thickness": "20 mm", "material": "steel", "support": "clamped-free", "damping_ratio": 0.015},
	"fluid": {"name": "water", "temperature": "10 degC"}, "flow": {"speed": "0.8 m/s"}, "surroundings": {"depth_below_surface": "6 m"}}`

// windTunnel is a bluff body in air that is only known by mass and frequency.
const windTunnel = `{"structure": {"kind": "generic", "length": "0.5 m", "mass": "40 kg", "frequency_dry": "6 Hz", "damping_ratio": 0.01}, "fluid": "air", "flow": {"speed": "60 m/s"}}`

// request reads a request: keep and free as lists with blanks, given as
// "length 0.025".
func request(t testing.TB, doc, given, keep, free string) *similar.Request {
	t.Helper()
	r := similar.NewRequest(decode(t, doc))
	words := strings.Fields(given)
	for i := 0; i+1 < len(words); i += 2 {
		f, known := similar.FindFactor(words[i])
		x, read := similar.ParseRatio(words[i+1])
		if !known || !read {
			t.Fatalf("no factor %s %s", words[i], words[i+1])
		}
		r.Given[f] = x
	}
	for _, name := range strings.Fields(keep) {
		id, known := group.Find(name)
		if !known {
			t.Fatalf("no group %s", name)
		}
		r.Keep = append(r.Keep, id)
	}
	for _, name := range strings.Fields(free) {
		f, known := similar.FindFactor(name)
		if !known {
			t.Fatalf("no factor %s", name)
		}
		r.Free = append(r.Free, f)
	}
	return r
}

func scaled(t testing.TB, r *similar.Request) *similar.Scaling {
	t.Helper()
	s, violations := similar.Scale(r)
	if len(violations) > 0 {
		t.Fatal(violations)
	}
	return s
}

// formulas are the exponents of quantities as "time λ^(1/2)".
func formulas(s *similar.Scaling) map[string]string {
	m := map[string]string{}
	for i := range s.Quantities {
		m[s.Quantities[i].ID] = s.Quantities[i].Powers.Formula()
	}
	return m
}

// What the books on models tabulate. Sources, from memory: Hughes, Physical Models
// and Laboratory Techniques in Coastal Engineering, 1993, chapter 2 (Froude and
// Reynolds scales); Chakrabarti, Offshore Structure Modeling, 1994, chapter 2 (Froude
// and Cauchy: E ∝ λ, EI ∝ λ⁵, a spring ∝ λ²); Barlow, Rae & Pope, Low-Speed Wind Tunnel
// Testing, 1999 (Mach: the same speed in the same gas); Swisdak 1978 (underwater
// shocks, Hopkinson: times with the length, pressures the same).
func TestClassicalScalings(t *testing.T) {
	rows := []struct {
		name, doc, given, keep, free string
		want                         map[string]string
	}{
		{"Froude", pile, "length 1:40", "froude", "", map[string]string{
			"speed": "λ^(1/2)", "time": "λ^(1/2)", "frequency": "λ^(-1/2)", "acceleration": "1", "mass": "λ^3", "force": "λ^3", "force_per_length": "λ^2",
			"pressure": "λ", "moment": "λ^4", "power": "λ^(7/2)", "energy": "λ^4", "area": "λ^2", "volume": "λ^3", "gravity": "1",
			"young_modulus": "1", "natural_frequency": "λ^-1"}},
		{"Froude and Cauchy", pile, "length 1:40", "froude cauchy", "", map[string]string{
			"young_modulus": "λ", "bending_stiffness_beam": "λ^5", "bending_stiffness_plate": "λ^4", "stiffness": "λ^2", "rotational_stiffness": "λ^4",
			"tension": "λ^3", "natural_frequency": "λ^(-1/2)", "stress": "λ", "strain": "1", "damping_coefficient": "λ^(5/2)", "mass_per_length": "λ^2", "inertia": "λ^5"}},
		{"Reynolds, same fluid", pile, "length 1:40", "reynolds", "", map[string]string{
			"speed": "λ^-1", "time": "λ^2", "force": "1", "pressure": "λ^-2", "power": "λ^-1", "acceleration": "λ^-3"}},
		{"Mach, same gas", windTunnel, "length 1:40", "mach", "", map[string]string{
			"speed": "1", "time": "λ", "pressure": "1", "force": "λ^2", "frequency": "λ^-1"}},
		{"Weber, same liquid", pile, "length 1:40", "weber", "", map[string]string{
			"speed": "λ^(-1/2)", "time": "λ^(3/2)", "pressure": "λ^-1", "force": "λ"}},
		{"Cauchy, same material", pile, "length 1:40", "cauchy", "", map[string]string{
			"speed": "1", "time": "λ", "natural_frequency": "λ^-1", "stress": "1"}},
		{"Froude and Reynolds, free fluid", pile, "length 1:40", "froude reynolds", "kinematic_viscosity", map[string]string{
			"kinematic_viscosity": "λ^(3/2)", "speed": "λ^(1/2)", "fluid_density": "1"}},
		{"Froude and Reynolds, centrifuge", pile, "length 1:40", "froude reynolds", "gravity", map[string]string{
			"gravity": "λ^-3", "speed": "λ^-1"}},
		{"Froude and cavitation", pile, "length 1:40", "froude cavitation", "", map[string]string{"static_pressure": "λ"}},
		{"reduced velocity at a chosen speed", windTunnel, "length 1:40 speed 1:4", "reduced_velocity mass_ratio", "", map[string]string{
			"natural_frequency": "λ^-1 λ_U", "stiffness": "λ λ_U^2", "time": "λ λ_U^-1", "mass": "λ^3"}},
		{"Froude, by the time", pile, "time 1:5", "froude", "", map[string]string{"length": "λ_T^2", "speed": "λ_T"}},
		{"Froude, by the speed", pile, "speed 1:5", "froude", "", map[string]string{"length": "λ_U^2", "time": "λ_U"}},
		{"Womersley, same blood", `{"structure": {"kind": "vessel", "radius": "10 mm", "wall_thickness": "1 mm", "young_modulus": "0.5 MPa", "density": "1100 kg/m3", "length": "0.4 m", "pulse_frequency": "1.2 Hz"}, "fluid": "blood", "flow": {"speed": "0.2 m/s"}}`,
			"length 3:1", "womersley reynolds", "", map[string]string{"time": "λ^2", "speed": "λ^-1", "frequency": "λ^-2"}},
		{"shock on a plate, same water", `{"structure": {"kind": "plate", "length": "1 m", "width": "1 m", "thickness": "10 mm", "material": "steel", "edges": "CCCC", "wetted_sides": 1}, "fluid": "seawater", "surroundings": {"shock_pressure": "5 MPa", "shock_decay_time": "0.5 ms"}}`,
			"length 1:10", "mach taylor_parameter", "", map[string]string{"time": "λ", "pressure": "1", "young_modulus": "1", "mass_per_area": "λ"}},
		{"nothing kept, waves", `{"structure": {"kind": "floater", "diameter": "2 m", "draft": "3 m"}, "fluid": "seawater", "waves": {"height": "1 m", "period": "6 s"}}`,
			"length 1:25", "", "", map[string]string{"time": "λ^(1/2)", "speed": "λ^(1/2)", "mass": "λ^3"}},
		{"floater on a mooring", `{"structure": {"kind": "floater", "diameter": "2 m", "draft": "3 m", "natural_period_heave": "4 s", "restoring_stiffness": "30 kN/m", "mooring_stiffness": "2 kN/m"}, "fluid": "seawater", "waves": {"height": "1 m", "period": "6 s"}}`,
			"length 1:25", "froude", "", map[string]string{"restoring_stiffness": "λ^2", "restored_period": "λ^(1/2)", "stiffness": "λ^2", "natural_frequency": "λ^(-1/2)"}},
	}
	checked := 0
	for _, row := range rows {
		s := scaled(t, request(t, row.doc, row.given, row.keep, row.free))
		got := formulas(s)
		for id, want := range row.want {
			if checked++; got[id] != want {
				t.Errorf("%s: %s ∝ %s, not %s", row.name, id, got[id], want)
			}
		}
		if len(s.Exclusions) > 0 || len(s.Model.Violations) > 0 {
			t.Errorf("%s: %+v %v", row.name, s.Exclusions, s.Model.Violations)
		}
	}
	if len(rows) != 16 || checked != 75 {
		t.Errorf("%d rows, %d formulas", len(rows), checked)
	}
}

// What excludes what, by how much, and what would reconcile it. Froude against
// Reynolds: Hughes 1993; Froude against Weber and against Mach: Le Méhauté 1976; all
// from memory, and each a line of algebra.
func TestExclusions(t *testing.T) {
	rows := []struct {
		name, given, keep, free string
		letGo                   string
		groups                  map[string]string // deviation of each if the others are kept
		remedies                map[string]string // factor that would reconcile
	}{
		{"Froude, Reynolds", "length 1:40", "froude reynolds", "", "reynolds",
			map[string]string{"froude": "λ^(-3/2)", "reynolds": "λ^(3/2)"},
			map[string]string{"length": "1", "gravity": "λ^-3", "kinematic_viscosity": "λ^(3/2)"}},
		{"Froude, Weber", "length 1:40", "froude weber", "", "weber",
			map[string]string{"froude": "λ^-1", "weber": "λ^2"},
			map[string]string{"length": "1", "gravity": "λ^-2", "surface_tension": "λ^2", "fluid_density": "λ^-2"}},
		{"Froude, Mach", "length 1:100", "froude mach", "", "mach",
			map[string]string{"froude": "λ^(-1/2)", "mach": "λ^(1/2)"},
			map[string]string{"length": "1", "gravity": "λ^-1", "sound_speed": "λ^(1/2)"}},
		{"Mach, Reynolds", "length 1:10", "mach reynolds", "", "reynolds",
			map[string]string{"mach": "λ^-1", "reynolds": "λ"},
			map[string]string{"length": "1", "sound_speed": "λ^-1", "kinematic_viscosity": "λ"}},
		{"Bond alone", "length 1:40", "bond", "", "bond",
			map[string]string{"bond": "λ^2"},
			map[string]string{"length": "1", "gravity": "λ^-2", "fluid_density": "λ^-2", "surface_tension": "λ^2"}},
		{"Froude at a given speed", "length 1:40 speed 1:2", "froude", "", "froude",
			map[string]string{"froude": "λ^(-1/2) λ_U"},
			map[string]string{"length": "λ_U^2", "speed": "λ^(1/2)", "gravity": "λ^-1 λ_U^2"}},
		{"Froude, Cauchy, same stiffness", "length 1:40 young_modulus 1", "froude cauchy", "", "cauchy",
			map[string]string{"froude": "λ^(-1/2)", "cauchy": "λ"},
			map[string]string{"length": "1", "gravity": "λ^-1", "fluid_density": "λ^-1", "young_modulus": "λ"}},
		{"four groups, of which two", "length 1:40", "froude cauchy mass_ratio reynolds", "", "reynolds",
			map[string]string{"froude": "λ^(-3/2)", "reynolds": "λ^(3/2)"},
			map[string]string{"length": "1", "gravity": "λ^-3", "kinematic_viscosity": "λ^(3/2)"}},
		{"three groups by a free gravity", "length 1:40", "froude reynolds weber", "gravity", "weber",
			map[string]string{"reynolds": "λ^(1/2)", "weber": "λ^-1"},
			map[string]string{"length": "1", "kinematic_viscosity": "λ^(1/2)", "fluid_density": "λ", "surface_tension": "λ^-1"}},
	}
	ran := 0
	for _, row := range rows {
		s := scaled(t, request(t, pile, row.given, row.keep, row.free))
		if len(s.Exclusions) != 1 {
			t.Errorf("%s: %d exclusions", row.name, len(s.Exclusions))
			continue
		}
		x := &s.Exclusions[0]
		groups, remedies := map[string]string{}, map[string]string{}
		for _, d := range x.Groups {
			groups[group.Of(d.Group).ID] = d.Powers.Formula()
		}
		for _, m := range x.Remedies {
			remedies[similar.FactorOf(m.Factor).ID] = m.Powers.Formula()
			if math.Abs(m.Now*m.Change/m.Needed-1) > 1e-12 {
				t.Errorf("%s: %+v", row.name, m)
			}
		}
		if group.Of(x.Group).ID != row.letGo || fmt.Sprint(groups) != fmt.Sprint(row.groups) || fmt.Sprint(remedies) != fmt.Sprint(row.remedies) {
			t.Errorf("%s: %s of %v, with %v", row.name, group.Of(x.Group).ID, groups, remedies)
		}
		ran++
	}
	if ran != 9 {
		t.Errorf("%d rows", ran)
	}
	if s := scaled(t, request(t, pile, "length 1:40", "froude reynolds", "")); math.Abs(s.Exclusions[0].Groups[0].Factor/252.98-1) > 1e-4 {
		t.Errorf("Froude is %v of what it was", s.Exclusions[0].Groups[0].Factor)
	}
}

// At full size nothing excludes anything; and what a wanted fluid really has makes
// two groups agree within the tolerance.
func TestNoExclusion(t *testing.T) {
	if s := scaled(t, request(t, pile, "length 1", "froude reynolds weber mach bond cauchy cavitation", "")); len(s.Exclusions) > 0 {
		t.Errorf("at full size: %+v", s.Exclusions)
	}
	r := request(t, pile, "length 1:40 kinematic_viscosity 0.004", "froude reynolds", "")
	s := scaled(t, r)
	if k := s.Groups[1]; len(s.Exclusions) > 0 || !k.Held || math.Abs(k.Factor-math.Pow(40, -1.5)/0.004) > 1e-9 || math.Abs(k.Judged/k.Factor-1) > 1e-9 {
		t.Errorf("nearly the viscosity: %+v %+v", s.Exclusions, k)
	}
	r.Tolerance = 1e-4
	if s := scaled(t, r); len(s.Exclusions) != 1 {
		t.Error("a tolerance of 1e-4 lets 1 % pass")
	}
}

// A Froude model at 1:40 is laminar where the prototype is not.
func TestFroudeModelIsLaminar(t *testing.T) {
	s := scaled(t, request(t, `{"structure": {"kind": "generic", "shape": "streamlined", "length": "0.8 m", "mass": "300 kg", "frequency_dry": "4 Hz", "damping_ratio": 0.01, "span": "3 m", "thickness": "0.1 m"},
		"fluid": "seawater", "flow": {"speed": "12 m/s"}, "surroundings": {"depth_below_surface": "2 m"}}`, "length 1:40", "froude", ""))
	if len(s.Model.Violations) > 0 {
		t.Fatal(s.Model.Violations)
	}
	at := slices.IndexFunc(s.Comparison.Verdicts, func(v similar.VerdictPair) bool { return v.Entry.ID == "laminar-flow" })
	if at < 0 || s.Comparison.Verdicts[at].A.String() != "invalid" || s.Comparison.Verdicts[at].B.String() != "valid" {
		t.Errorf("%+v", s.Comparison.Verdicts)
	}
	re := s.Comparison.Group(group.Reynolds)
	if re == nil || re.Kept || math.Abs(re.Factor*math.Pow(40, 1.5)-1) > 1e-9 {
		t.Errorf("Reynolds: %+v", re)
	}
	if fr := s.Comparison.Group(group.Froude); fr == nil || !fr.Kept {
		t.Errorf("Froude: %+v", fr)
	}
}

// shipped reads the shipped cases that are JSON.
func shipped(t testing.TB) map[string]*input.Case {
	t.Helper()
	files, err := filepath.Glob("../../testdata/cases/*.json")
	if err != nil {
		t.Fatal(err)
	}
	cases := map[string]*input.Case{}
	for _, file := range files {
		data, err := os.ReadFile(file)
		if err != nil {
			t.Fatal(err)
		}
		cases[filepath.Base(file)] = decode(t, string(data))
	}
	if len(cases) < 40 {
		t.Fatalf("%d cases", len(cases))
	}
	return cases
}
