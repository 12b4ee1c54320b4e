package ladder

import (
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// Recommendation is the cheapest model class that holds, and why.
type Recommendation struct {
	Class      *Class
	Axes       Axes
	Rejected   []Rejected          // candidates cheaper than the class, in order
	Conditions []*assumption.Entry // marginal or undetermined, to be verified
	IfSettled  []Settled           // undetermined ones that could change the answer
	// Provisional is true where a missing input could still change the class.
	Provisional bool
	// Beside is the class for the frequencies, where the recommended class
	// gives none of its own: the cheapest of the modal ones that would stand
	// without fluid at rest. Nil otherwise.
	Beside *Class
}

// Rejected is a cheaper candidate and the assumptions that ruled it out.
type Rejected struct {
	Class   *Class
	Because []*assumption.Entry
}

// Settled says to which class an undetermined assumption would lead if it
// turned out invalid.
type Settled struct {
	Entry *assumption.Entry
	Class *Class
}

// Choose recommends a class.
func Choose(kind string, g *group.Set, fs []finding.Finding) Recommendation {
	r := Recommendation{Class: choose(kind, g.Traits, fs, nil)}
	r.reject(kind, g.Traits, fs)
	r.condition(kind, g.Traits, fs)
	r.Provisional = len(r.IfSettled) > 0
	if r.Class.Axes.Coupling == "one-way" || r.Class.ID == StaticAeroelastic {
		r.Beside = beside(kind, g.Traits, fs)
	}
	r.Axes = axes(r.Class, kind, g, fs)
	return r
}

// choose returns the cheapest class in its domain that holds, were the finding
// of one assumption invalid (nil: as they are). The list is ordered by rank,
// and its last class rests on nothing.
func choose(kind string, t group.Traits, fs []finding.Finding, invalid *assumption.Entry) *Class {
	for i := range Classes {
		c := &Classes[i]
		if c.Domain.Covers(kind, t) && c.holds(fs) && !c.restsOn(invalid) {
			return c
		}
	}
	return &Classes[len(Classes)-1]
}

func (c *Class) restsOn(e *assumption.Entry) bool {
	if e == nil {
		return false
	}
	for _, r := range c.RestsOn {
		if r == e {
			return true
		}
	}
	return false
}

func (r *Recommendation) reject(kind string, t group.Traits, fs []finding.Finding) {
	for i := range Classes {
		c := &Classes[i]
		if c == r.Class {
			return
		}
		if !c.Domain.Covers(kind, t) {
			continue
		}
		rejected := Rejected{Class: c}
		for _, e := range c.RestsOn {
			if fs[e.Index()].RulesOut() {
				rejected.Because = append(rejected.Because, e)
			}
		}
		r.Rejected = append(r.Rejected, rejected)
	}
}

func (r *Recommendation) condition(kind string, t group.Traits, fs []finding.Finding) {
	for _, e := range r.Class.RestsOn {
		f := &fs[e.Index()]
		if !f.OfInterest || f.Verdict != finding.Marginal && f.Verdict != finding.Undetermined {
			continue
		}
		r.Conditions = append(r.Conditions, e)
		if f.Verdict != finding.Undetermined {
			continue
		}
		if c := choose(kind, t, fs, e); c != r.Class {
			r.IfSettled = append(r.IfSettled, Settled{Entry: e, Class: c})
		}
	}
}

// beside returns the cheapest modal class that would stand without fluid at
// rest, whatever flow there is.
func beside(kind string, t group.Traits, fs []finding.Finding) *Class {
	still := t&^states | group.Still
	for i := range Classes {
		c := &Classes[i]
		if c.Rank > lastModalRank {
			return nil
		}
		if !c.Domain.Covers(kind, still) {
			continue
		}
		stands := true
		for _, e := range c.RestsOn {
			if e != assumption.StillFluid && fs[e.Index()].RulesOut() {
				stands = false
			}
		}
		if stands {
			return c
		}
	}
	return nil
}

// Dearer reports whether a class stands above another on the ladder.
func Dearer(a, b *Class) bool {
	for i := range Classes {
		switch &Classes[i] {
		case a:
			return false
		case b:
			return a != b
		}
	}
	return false
}
