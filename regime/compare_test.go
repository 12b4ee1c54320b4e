package regime_test

import (
	"fmt"
	"math"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/group"
)

// comparison holds two answers against each other, to a relative difference.
type comparison struct {
	relative float64
}

// partsOfOne are groups that are small differences of large terms where they
// are small at all: a radiation that all but cancels over the mode, an added
// mass that vanishes above coincidence. They are parts of the ideal added mass
// (or of the whole damping), and what rounds is a part of that.
var partsOfOne = map[group.ID]bool{group.AcousticInertia: true, group.AcousticDamping: true, group.DampingRadiation: true}

func (c comparison) near(a, b, relative float64) bool {
	if math.IsNaN(a) || math.IsNaN(b) {
		return math.IsNaN(a) && math.IsNaN(b)
	}
	return a == b || math.Abs(a-b) <= relative*math.Max(math.Abs(a), math.Abs(b))
}

// answers says where two answers differ in anything dimensionless, "" where
// they don't.
func (c comparison) answers(a, b *regime.Answer) string {
	if d := c.groups(a.Groups, b.Groups); d != "" {
		return d
	}
	for i := range a.Findings {
		f, g := &a.Findings[i], &b.Findings[i]
		id := assumption.Catalogue[i].ID
		if f.Verdict != g.Verdict || f.OfInterest != g.OfInterest || f.Reason != g.Reason || len(f.Parts()) != len(g.Parts()) {
			return fmt.Sprintf("%s: %s and %s", id, f.Verdict, g.Verdict)
		}
		for j := range f.Parts() {
			p, q := &f.Parts()[j], &g.Parts()[j]
			if p.Measure != q.Measure || p.Waits != q.Waits || p.Wait != q.Wait || !c.estimate(p.Estimate, q.Estimate) || !c.near(p.Limit, q.Limit, 0) ||
				!c.near(p.Hold, q.Hold, 10*c.relative) || !c.near(p.Factor, q.Factor, c.relative) {
				return fmt.Sprintf("%s, part %d: %+v and %+v", id, j, *p, *q)
			}
		}
	}
	r, s := &a.Recommendation, &b.Recommendation
	if r.Class != s.Class || r.Axes != s.Axes || r.Beside != s.Beside {
		return fmt.Sprintf("%s %v and %s %v", r.Class.ID, r.Axes, s.Class.ID, s.Axes)
	}
	return ""
}

// estimate compares two estimates. Many are a ratio minus one, which loses the
// digits that the two have in common: what rounds in the ratio stays, so that
// below 1 the difference counts and not the relative one.
func (c comparison) estimate(a, b float64) bool {
	return a == b || math.Abs(a-b) <= 10*c.relative*math.Max(1, math.Max(math.Abs(a), math.Abs(b)))
}

func (c comparison) groups(a, b *group.Set) string {
	if a.Traits != b.Traits {
		return fmt.Sprintf("traits %b and %b", a.Traits, b.Traits)
	}
	for id := group.ID(0); id < group.Count; id++ {
		same := c.near(a.Get(id), b.Get(id), c.relative) || partsOfOne[id] && math.Abs(a.Get(id)-b.Get(id)) <= c.relative
		if a.State(id) != b.State(id) || !same {
			return fmt.Sprintf("%s: %v (state %d) and %v (state %d), relative difference %.2g", group.Of(id).ID,
				a.Get(id), a.State(id), b.Get(id), b.State(id), math.Abs(a.Get(id)/b.Get(id)-1))
		}
		if a.State(id) == group.Missing && a.Need(id).Input != b.Need(id).Input {
			return fmt.Sprintf("%s waits for %s and %s", group.Of(id).ID, a.Need(id).Input, b.Need(id).Input)
		}
	}
	if a.Modes.N != b.Modes.N {
		return fmt.Sprintf("%d and %d modes", a.Modes.N, b.Modes.N)
	}
	for i, v := range a.Modes.V[:a.Modes.N] {
		if !c.near(v, b.Modes.V[i], c.relative) {
			return fmt.Sprintf("mode %d: %v and %v", i, v, b.Modes.V[i])
		}
	}
	if a.Band != b.Band {
		return fmt.Sprintf("transition %v and %v", a.Band, b.Band)
	}
	return ""
}
