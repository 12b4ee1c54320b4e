package similar_test

import (
	"fmt"
	"maps"
	"math"
	"slices"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/similar"
)

// exactGroups are groups of a cylinder that follow from the scales alone, without
// a solution that depends on other groups.
var exactGroups = []string{"mass_ratio", "reduced_velocity", "reynolds", "froude", "mach", "cauchy", "elastogravity", "bond", "weber",
	"cavitation", "mass_number", "length_reynolds", "displacement", "displacement_depth", "gap_ratio", "slenderness", "added_mass_ratio"}

// drawn is a case of a cylinder by values, with everything that these groups need.
func drawn(t *rapid.T) string {
	between := func(label string, low, high float64) float64 {
		return math.Exp(rapid.Float64Range(math.Log(low), math.Log(high)).Draw(t, label))
	}
	d := between("diameter", 0.01, 3)
	return fmt.Sprintf(`{"structure": {"kind": "cylinder", "diameter": "%.6g m", "length": "%.6g m", "wall_thickness": "%.6g m", "density": "%.6g kg/m3", "young_modulus": "%.6g Pa",
		"poisson_ratio": 0.3, "linear_strain": 0.001, "support": "clamped-free", "damping_ratio": 0.01},
		"fluid": {"phase": "liquid", "density": "%.6g kg/m3", "viscosity": "%.6g Pa s", "sound_speed": "%.6g m/s", "surface_tension": "%.6g N/m", "vapour_pressure": "2 kPa", "pressure": "%.6g Pa"},
		"flow": {"speed": "%.6g m/s"}, "motion": {"amplitude": "%.6g m"}, "surroundings": {"depth_below_surface": "%.6g m", "wall_gap": "%.6g m"}}`,
		d, d*between("slenderness", 5, 50), d*between("wall", 0.01, 0.3), between("solid", 900, 9000), between("modulus", 1e6, 3e11),
		between("density", 700, 1300), between("viscosity", 1e-4, 1e-1), between("sound", 900, 2000), between("tension", 0.01, 0.1), between("pressure", 1e4, 1e6),
		between("speed", 0.01, 30), d*between("amplitude", 0.001, 0.5), d*between("depth", 1.5, 8), d*between("gap", 1, 4))
}

// drawnRequest asks for some groups in some order, with something free.
func drawnRequest(t *rapid.T, c *input.Case) *similar.Request {
	r := similar.NewRequest(c)
	r.Given[similar.Length] = math.Exp(rapid.Float64Range(math.Log(0.01), math.Log(20)).Draw(t, "length"))
	for _, name := range rapid.Permutation(exactGroups).Draw(t, "groups")[:rapid.SampledFrom([]int{0, 2, 3, 4, 5, 6, 7, 8}).Draw(t, "number")] {
		id, _ := group.Find(name)
		r.Keep = append(r.Keep, id)
	}
	for _, f := range []similar.Factor{similar.FluidDensity, similar.KinematicViscosity, similar.SoundSpeed, similar.SurfaceTension, similar.Gravity} {
		switch rapid.SampledFrom([]string{"same", "free", "given", "same"}).Draw(t, similar.FactorOf(f).ID) {
		case "free":
			r.Free = append(r.Free, f)
		case "given":
			r.Given[f] = math.Exp(rapid.Float64Range(-1, 1).Draw(t, "factor"))
		}
	}
	return r
}

// Whatever is kept together is kept in the model as it is judged: to nine digits.
// What is let go is distorted by the factor that is said.
func TestKeptGroupsAreKept(t *testing.T) {
	held, gone, judged := 0, 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		s, violations := similar.Scale(drawnRequest(rt, decode(t, drawn(rt))))
		if len(violations) > 0 {
			rt.Fatal(violations)
		}
		if s.Comparison == nil {
			return // a length or a pressure beyond its range
		}
		judged++
		for _, k := range s.Groups {
			want := k.Factor
			if p := s.Comparison.Group(k.Group); p == nil || math.Abs(p.Factor/want-1) > 1e-9 || p.Factor != k.Judged {
				rt.Errorf("%s: %+v, not %v", group.Of(k.Group).ID, p, want)
			}
			if k.Held {
				held++
			} else {
				gone++
			}
		}
	})
	if held < 50 || gone < 20 || judged < 50 {
		t.Errorf("%d kept, %d let go, %d models judged", held, gone, judged)
	}
}

// A set that excludes each other is a smallest one: without any one of its groups
// the others can be kept, and that one is then distorted as said; and each remedy
// by itself reconciles them.
func TestExclusionsAreSmallest(t *testing.T) {
	sets, remedies := 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		c := decode(t, drawn(rt))
		r := drawnRequest(rt, c)
		r.Tolerance = 0 // lest one of a set be let pass where another is not
		s := mustScale(rt, r)
		for _, x := range s.Exclusions {
			var all []group.ID
			for _, d := range x.Groups {
				all = append(all, d.Group)
			}
			again := *r
			again.Keep = all
			if n := exclusions(rt, &again); n != 1 {
				rt.Fatalf("%v: %d exclusions by themselves", all, n)
			}
			for _, out := range x.Groups {
				again.Keep = slices.DeleteFunc(slices.Clone(all), func(id group.ID) bool { return id == out.Group })
				if n := exclusions(rt, &again); n != 0 {
					rt.Errorf("%v without %s still exclude each other", all, group.Of(out.Group).ID)
				}
				// with the others first, it is the one that is let go
				again.Keep = append(again.Keep, out.Group)
				if k := mustScale(rt, &again).Groups[len(all)-1]; k.Held && math.Abs(out.Factor-1) > 1e-9 || math.Abs(k.Factor/out.Factor-1) > 1e-9 {
					rt.Errorf("%s: %+v, not %v", group.Of(out.Group).ID, k, out.Factor)
				}
			}
			for _, m := range x.Remedies {
				if m.Needed < 1e-25 || m.Needed > 1e25 {
					continue
				}
				again = *r
				again.Keep = all
				again.Given[m.Factor] = m.Needed
				if n := exclusions(rt, &again); n != 0 {
					rt.Errorf("%v: %s at %v does not reconcile them", all, similar.FactorOf(m.Factor).ID, m.Needed)
				}
				remedies++
			}
			sets++
		}
	})
	if sets < 20 || remedies < 50 {
		t.Errorf("%d sets, %d remedies", sets, remedies)
	}
}

func mustScale(t *rapid.T, r *similar.Request) *similar.Scaling {
	s, violations := similar.Scale(r)
	if len(violations) > 0 {
		t.Fatal(violations)
	}
	return s
}

func exclusions(t *rapid.T, r *similar.Request) int { return len(mustScale(t, r).Exclusions) }

// A scale of one to one changes nothing, whatever is kept.
func TestIdentity(t *testing.T) {
	ran := 0
	for name, c := range shipped(t) {
		r := similar.NewRequest(c)
		r.Given[similar.Length] = 1
		r.Keep = []group.ID{group.Froude, group.Reynolds, group.Cauchy, group.Mach, group.Weber}
		s, violations := similar.Scale(r)
		if len(violations) > 0 || len(s.Model.Violations) > 0 || len(s.Exclusions) > 0 {
			t.Fatalf("%s: %v %+v", name, violations, s)
		}
		for _, f := range s.Factors {
			if f.Origin != similar.Unknown && math.Abs(f.Value-1) > 1e-15 {
				t.Errorf("%s: %s %v", name, similar.FactorOf(f.Factor).ID, f.Value)
			}
		}
		if n := s.Comparison.Distorted(); n > 0 || len(s.Comparison.Verdicts)+len(s.Comparison.Axes)+len(s.Comparison.OnlyA)+len(s.Comparison.OnlyB) > 0 {
			t.Errorf("%s: %d groups distorted, %+v", name, n, s.Comparison.Verdicts)
		}
		for _, p := range s.Comparison.Groups {
			if math.Abs(p.Factor-1) > 1e-9 && math.Abs(p.B-p.A) > 1e-9 {
				t.Errorf("%s: %s %v", name, group.Of(p.ID).ID, p.Factor)
			}
		}
		ran++
	}
	if ran < 40 {
		t.Errorf("%d cases", ran)
	}
}

// Two scalings one after the other are one scaling by the product.
func TestComposition(t *testing.T) {
	ran := 0
	rapid.Check(t, func(rt *rapid.T) {
		r := drawnRequest(rt, decode(t, drawn(rt)))
		first := mustScale(rt, r)
		if first.Comparison == nil {
			return
		}
		second := *r
		second.Case = first.Model.Case
		both := *r
		for f := range r.Given {
			both.Given[f] = r.Given[f] * r.Given[f]
		}
		s, whole := mustScale(rt, &second), mustScale(rt, &both)
		for f := range first.Factors {
			if math.Abs(first.Factors[f].Value*s.Factors[f].Value/whole.Factors[f].Value-1) > 1e-9 {
				rt.Errorf("%s: %v × %v, not %v", similar.FactorOf(similar.Factor(f)).ID, first.Factors[f].Value, s.Factors[f].Value, whole.Factors[f].Value)
			}
		}
		for _, p := range both.Case.Places() {
			q, w := s.Model.Case.At(p), whole.Model.Case.At(p)
			if q == nil || w == nil || math.Abs(q.Value-w.Value) > 1e-9*math.Abs(w.Value) {
				rt.Errorf("%s: %v and %v", p.Path(), q, w)
			}
		}
		ran++
	})
	if ran < 50 {
		t.Errorf("%d compositions", ran)
	}
}

// A case against itself keeps everything; turned round, factors are inverse and
// the two sides change places.
func TestCompareIsSymmetric(t *testing.T) {
	var answers []*regime.Answer
	for name, c := range shipped(t) {
		a, violations := regime.Classify(c)
		if len(violations) > 0 {
			t.Fatal(name, violations)
		}
		self := similar.Compare(a, a, 0)
		if self.Distorted() > 0 || len(self.OnlyA)+len(self.OnlyB)+len(self.Verdicts)+len(self.Axes) > 0 || len(self.Groups) == 0 {
			t.Errorf("%s against itself: %+v", name, self)
		}
		answers = append(answers, a)
	}
	pairs := 0
	for i, a := range answers {
		b := answers[(i+1)%len(answers)]
		to, fro := similar.Compare(a, b, similar.Kept), similar.Compare(b, a, similar.Kept)
		if len(to.Groups) != len(fro.Groups) || !slices.Equal(to.OnlyA, fro.OnlyB) || !slices.Equal(to.OnlyB, fro.OnlyA) || len(to.Verdicts) != len(fro.Verdicts) || len(to.Axes) != len(fro.Axes) {
			t.Fatalf("%d and %d groups", len(to.Groups), len(fro.Groups))
		}
		for j := range to.Groups {
			p, q := to.Groups[j], fro.Groups[j]
			inverse := p.A == 0 || p.B == 0 || math.Abs(p.Factor*q.Factor-1) < 1e-12
			if p.ID != q.ID || p.A != q.B || p.Kept != q.Kept || !inverse {
				t.Errorf("%+v and %+v", p, q)
			}
		}
		for j := range to.Verdicts {
			p, q := to.Verdicts[j], fro.Verdicts[j]
			if p.Entry != q.Entry || p.A != q.B || p.B != q.A || p.A == p.B {
				t.Errorf("%+v and %+v", p, q)
			}
		}
		pairs++
	}
	if pairs < 40 {
		t.Errorf("%d pairs", pairs)
	}
}

// Every shipped case can be scaled, with Froude and with Froude and Cauchy and with
// every group by itself; nothing panics, and what is said to be kept is kept or
// remarked on.
func TestShippedCasesScale(t *testing.T) {
	keeps := [][]string{{"froude"}, {"froude", "cauchy", "mass_ratio"}, {"reynolds"}, {"stokes"}, {"mach", "reduced_velocity_wet"}, {"froude", "reynolds", "weber"}}
	always := len(keeps)
	for _, name := range similar.GroupNames() {
		keeps = append(keeps, []string{name})
	}
	models, kept, remarked, refused := 0, 0, 0, 0
	cases := shipped(t)
	for i, name := range slices.Sorted(maps.Keys(cases)) {
		c := cases[name]
		for j, keep := range keeps {
			if j >= always && (i+j)%4 != 0 {
				continue // each group in a quarter of the cases
			}
			r := similar.NewRequest(c)
			r.Given[similar.Length] = 1.0 / 20
			for _, g := range keep {
				id, _ := group.Find(g)
				r.Keep = append(r.Keep, id)
			}
			s, violations := similar.Scale(r)
			if len(violations) > 0 {
				if len(keep) != 1 || violations[0].Pointer != "/keep/0" { // a property that the case does not have
					t.Errorf("%s %v: %v", name, keep, violations)
				}
				refused++
				continue
			}
			if s.Comparison == nil {
				if len(s.Model.Violations) == 0 {
					t.Errorf("%s %v: no model, and nothing wrong with it", name, keep)
				}
				continue
			}
			models++
			for _, k := range s.Groups {
				if !k.Held || math.IsNaN(k.Judged) {
					continue
				}
				said := slices.ContainsFunc(s.Notes, func(w kind.Warning) bool { return w.Code == "not-by-scales-alone" })
				switch {
				case math.Abs(k.Judged-1) < 1e-6:
					kept++
				case said:
					remarked++
				default:
					t.Errorf("%s %v: %s is %v of what it was", name, keep, group.Of(k.Group).ID, k.Judged)
				}
			}
		}
	}
	t.Logf("%d models judged; %d groups kept, %d remarked on; %d requests refused", models, kept, remarked, refused)
	if models < 800 || kept < 200 || remarked > kept {
		t.Errorf("%d models, %d groups kept, %d remarked on", models, kept, remarked)
	}
}
