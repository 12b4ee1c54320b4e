package group_test

import (
	"math"
	"math/bits"
	"regexp"
	"testing"

	"regimed/regime/group"
)

var groupID = regexp.MustCompile(`^[a-z][a-z0-9_]*$`)

// Every group has an id of its own, a symbol, a title and a definition.
func TestTable(t *testing.T) {
	seen := map[string]bool{}
	core := 0
	for id := group.ID(0); id < group.Count; id++ {
		d := group.Of(id)
		if !groupID.MatchString(d.ID) || seen[d.ID] {
			t.Errorf("group %d has the id %q", id, d.ID)
		}
		seen[d.ID] = true
		if d.Symbol == "" || d.Title == "" || d.Definition == "" {
			t.Errorf("%s lacks a symbol, a title or a definition", d.ID)
		}
		if found, ok := group.Find(d.ID); !ok || found != id {
			t.Errorf("%s is not found by its id", d.ID)
		}
		if d.Core {
			core++
		}
		for i, b := range d.Bands {
			if b.Name == "" || i > 0 && !(b.Below > d.Bands[i-1].Below) {
				t.Errorf("bands of %s are not in order", d.ID)
			}
		}
	}
	if core != 6 || len(seen) != int(group.Count) {
		t.Errorf("%d groups, %d of them core", len(seen), core)
	}
	if _, ok := group.Find("reynold"); ok {
		t.Error("a group is found that is none")
	}
	for id, want := range map[group.ID]string{group.MassRatio: "mass_ratio", group.ReducedVelocity: "reduced_velocity", group.Reynolds: "reynolds",
		group.Stokes: "stokes", group.Compressibility: "compressibility", group.Froude: "froude"} {
		if d := group.Of(id); d.ID != want || !d.Core {
			t.Errorf("core group %s is called %s", want, d.ID)
		}
	}
}

func TestStates(t *testing.T) {
	s := group.New()
	for id := group.ID(0); id < group.Count; id++ {
		if s.State(id) != group.Absent || s.Has(id) || !math.IsNaN(s.Get(id)) {
			t.Fatalf("%s has a value in a new set", group.Of(id).ID)
		}
	}
	s.Put(group.Mach, 0.3)
	s.Adopt(group.Reynolds, 3900)
	s.Miss(group.Froude, group.Need{Input: "flow.speed", Unit: "m/s", Coefficient: 2, Power: 1})
	s.Put(group.Stokes, math.Inf(1))
	s.Put(group.Knudsen, math.NaN())
	s.Put(group.Weber, 3)
	s.Drop(group.Weber)
	s.Miss(group.Bond, group.Need{})
	rows := 0
	for _, r := range []struct {
		id    group.ID
		state group.State
		x     float64
	}{
		{group.Mach, group.Known, 0.3}, {group.Reynolds, group.Adopted, 3900}, {group.Froude, group.Missing, math.NaN()},
		{group.Stokes, group.OffRange, math.NaN()}, {group.Knudsen, group.OffRange, math.NaN()}, {group.Weber, group.Absent, math.NaN()},
		{group.Bond, group.OffRange, math.NaN()}, {group.Cauchy, group.Absent, math.NaN()},
	} {
		rows++
		has := r.state == group.Known || r.state == group.Adopted
		if s.State(r.id) != r.state || s.Has(r.id) != has || s.Get(r.id) != r.x && has || math.IsNaN(s.Get(r.id)) == has {
			t.Errorf("%s: state %d, value %g", group.Of(r.id).ID, s.State(r.id), s.Get(r.id))
		}
	}
	if rows != 8 {
		t.Errorf("%d rows", rows)
	}
	if s.Need(group.Froude).Input != "flow.speed" {
		t.Errorf("need %+v", s.Need(group.Froude))
	}
	s.Put(group.Froude, 0.2)
	if !s.Has(group.Froude) {
		t.Error("a group that was missing does not take its value")
	}
}

// The input at which a group has a value follows where the group is a power of it.
func TestInputFor(t *testing.T) {
	nan := math.NaN()
	rows := []struct {
		n    group.Need
		g    float64
		want float64
	}{
		{group.Need{Coefficient: 2, Power: 1}, 0.3, 0.6},
		{group.Need{Coefficient: 2, Power: 2}, 9, 6},
		{group.Need{Coefficient: 5, Power: -1}, 0.5, 10},
		{group.Need{Coefficient: 5, Power: 0.5}, 3, 45},
		{group.Need{}, 0.3, nan},
		{group.Need{Coefficient: 2, Power: 1}, 0, nan},
		{group.Need{Coefficient: 2, Power: 1}, -1, nan},
		{group.Need{Coefficient: 2, Power: 1}, nan, nan},
		{group.Need{Coefficient: 1e300, Power: 0.1}, 1e10, nan}, // beyond what can be computed with
	}
	for _, r := range rows {
		got := r.n.InputFor(r.g)
		if math.IsNaN(got) != math.IsNaN(r.want) || !math.IsNaN(got) && math.Abs(got/r.want-1) > 1e-12 {
			t.Errorf("%+v for %g: %g, want %g", r.n, r.g, got, r.want)
		}
	}
	if len(rows) != 9 {
		t.Errorf("%d rows", len(rows))
	}
}

// A coefficient that can't be computed with is none.
func TestMissKeepsOnlyFiniteCoefficients(t *testing.T) {
	rows := 0
	for _, c := range []float64{math.Inf(1), math.Inf(-1), math.NaN(), 0, -1} {
		rows++
		s := group.New()
		s.Miss(group.Mach, group.Need{Input: "flow.speed", Unit: "m/s", Coefficient: c, Power: 1})
		if n := s.Need(group.Mach); n.Coefficient != 0 || n.Power != 0 || n.Input != "flow.speed" || s.State(group.Mach) != group.Missing {
			t.Errorf("coefficient %g: %+v", c, n)
		}
	}
	if rows != 5 {
		t.Errorf("%d rows", rows)
	}
}

func TestTraits(t *testing.T) {
	one := group.Fluid | group.Cross | group.Bluff
	if !one.Is(group.Fluid|group.Cross) || one.Is(group.Fluid|group.Axial) || !one.Is(0) {
		t.Error("Is does not ask for every trait")
	}
	if !one.Any(group.Axial|group.Cross) || one.Any(group.Axial|group.Still) || one.Any(0) {
		t.Error("Any does not ask for one trait")
	}
	if group.Flow != group.Cross|group.Axial|group.Grazing|group.Internal {
		t.Error("a mean flow is cross, axial, grazing or internal")
	}
	for _, f := range []group.Traits{group.Fluid, group.Still, group.Cross, group.Liquid, group.Film, group.Shock} {
		if bits.OnesCount64(uint64(f)) != 1 {
			t.Errorf("trait %b is not one bit", f)
		}
	}
}
