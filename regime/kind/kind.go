// Package kind turns what the caller said into scales and groups. A structure
// kind is one file and one line in the list in kinds.go.
package kind

import (
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
)

// Kind is one kind of structure.
type Kind struct {
	Name       string
	Title      string
	Doc        string         // what it stands for, in a sentence
	Fields     []*input.Field // its own fields; mass, frequency and damping come with Modal
	Directions []string       // how a flow may run; the first is assumed; none: no flow
	Waves      bool           // surface waves may run across it
	Surface    bool           // it has a free surface by what it is
	Gaps       bool           // a flow may be given by its speed in the gaps
	// New reads the case: it checks what its fields must agree on, fills the
	// scales, and returns the solved problems of the kind.
	New func(r *Resolver) Physics
}

// Physics are the solved problems of a kind, ready to give its own groups.
type Physics interface {
	Groups(s *scale.Set, g *group.Set)
}

// Warning is a plausible mistake, or something that the answer rests on and a
// reader should see. It never changes the answer.
type Warning struct {
	Pointer  string
	Code     string
	Sentence string
}

// Resolved is a case whose scales are known: where the core begins.
type Resolved struct {
	Kind    *Kind
	Scales  *scale.Set
	Traits  group.Traits
	Physics Physics
	Given   []GivenGroup // groups that the caller gave
}

// GivenGroup is a group that the caller gave in place of a quantity.
type GivenGroup struct {
	ID    group.ID
	Value float64
	used  bool
}

// Resolve derives the scales of a case. It returns violations where fields
// contradict each other or lie outside the range of a property.
func Resolve(c *input.Case) (*Resolved, []Warning, []input.Violation) {
	k := Find(c.Kind)
	r := newResolver(c, k)
	r.uncertain()
	r.fluid()
	r.environment()
	physics := k.New(r)
	r.active()
	r.closeGroups()
	r.compareGroups()
	if r.violations.Any() {
		return nil, nil, r.violations.List()
	}
	return &Resolved{Kind: k, Scales: r.Set, Traits: r.Traits, Physics: physics, Given: r.given}, r.warnings, nil
}

// Groups makes the groups from the scales.
func (r *Resolved) Groups() *group.Set {
	g := group.New()
	g.Traits = r.Traits
	formulas(r.Scales, g)
	drop(g)
	r.Physics.Groups(r.Scales, g)
	activeGroups(r.Scales, g)
	damping(r.Scales, g)
	for _, given := range r.Given {
		if !given.used && !g.Has(given.ID) {
			g.Adopt(given.ID, given.Value)
		}
	}
	return g
}
