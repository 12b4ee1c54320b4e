package similar

import (
	"math"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/ladder"
)

// Kept is the relative difference up to which a group counts as kept, unless the
// caller asks for another one.
const Kept = 0.02

// Comparison holds an answer B against an answer A.
type Comparison struct {
	A, B      *regime.Answer
	Tolerance float64 // relative difference up to which a group counts as kept
	Groups    []GroupPair
	OnlyA     []group.ID    // groups that only A has
	OnlyB     []group.ID    // groups that only B has
	Verdicts  []VerdictPair // that differ
	Axes      []AxisPair    // that differ
}

// GroupPair is a group that both answers have.
type GroupPair struct {
	ID     group.ID
	A, B   float64
	Factor float64 // B/A; NaN where only A is zero
	Kept   bool
}

// VerdictPair is an assumption that is judged differently.
type VerdictPair struct {
	Entry                      *assumption.Entry
	A, B                       finding.Verdict
	UtilisationA, UtilisationB float64 // NaN where there is none
}

// AxisPair is an axis of the recommendation that differs.
type AxisPair struct {
	ID   string
	A, B string
}

// Compare holds an answer b against an answer a, to a relative difference up to
// which a group counts as kept. The answers may be of different kinds of
// structure: groups that one does not have are not compared, but listed. The
// comparison refers to both answers, which must not be released before it is done
// with.
func Compare(a, b *regime.Answer, tolerance float64) *Comparison {
	c := &Comparison{A: a, B: b, Tolerance: tolerance}
	for id := range group.Count {
		switch inA, inB := a.Groups.Has(id), b.Groups.Has(id); {
		case inA && inB:
			c.Groups = append(c.Groups, c.pair(id))
		case inA:
			c.OnlyA = append(c.OnlyA, id)
		case inB:
			c.OnlyB = append(c.OnlyB, id)
		}
	}
	for i, e := range assumption.Catalogue {
		if f, g := &a.Findings[i], &b.Findings[i]; f.Verdict != g.Verdict {
			c.Verdicts = append(c.Verdicts, VerdictPair{Entry: e, A: f.Verdict, B: g.Verdict, UtilisationA: utilisation(f), UtilisationB: utilisation(g)})
		}
	}
	for i := range ladder.AxisList {
		x := &ladder.AxisList[i]
		if inA, inB := *x.Of(&a.Recommendation.Axes), *x.Of(&b.Recommendation.Axes); inA != inB {
			c.Axes = append(c.Axes, AxisPair{ID: x.ID, A: inA, B: inB})
		}
	}
	return c
}

func utilisation(f *finding.Finding) float64 {
	if u, ok := f.Utilisation(); ok {
		return u
	}
	return math.NaN()
}

func (c *Comparison) pair(id group.ID) GroupPair {
	p := GroupPair{ID: id, A: c.A.Groups.Get(id), B: c.B.Groups.Get(id)}
	switch {
	case p.A == p.B:
		p.Factor = 1
	case p.A == 0:
		p.Factor = math.NaN()
	default:
		p.Factor = p.B / p.A
	}
	p.Kept = p.Factor > 0 && math.Abs(math.Log(p.Factor)) <= math.Log1p(c.Tolerance)
	return p
}

// Group returns a group that both answers have, or nil.
func (c *Comparison) Group(id group.ID) *GroupPair {
	for i := range c.Groups {
		if c.Groups[i].ID == id {
			return &c.Groups[i]
		}
	}
	return nil
}

// Distorted counts the groups that are not kept.
func (c *Comparison) Distorted() int {
	n := 0
	for i := range c.Groups {
		if !c.Groups[i].Kept {
			n++
		}
	}
	return n
}
