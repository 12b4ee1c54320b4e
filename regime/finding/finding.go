package finding

import (
	"math"
	"slices"
	"sync"

	"regimed/regime/cite"
	"regimed/regime/group"
)

// Basis says where an estimate comes from.
type Basis uint8

// The bases of an estimate.
const (
	Canonical  Basis = iota // a solved canonical problem, with and without the effect
	Threshold               // a published threshold
	Definition              // the effect is present or absent by definition
)

func (b Basis) String() string {
	return [...]string{"canonical", "threshold", "definition"}[b]
}

// Part is one estimate of an assumption: an error, what it is measured
// against, and how far the canonical geometry may differ from the real one.
type Part struct {
	Measure  Measure
	Basis    Basis
	Estimate float64
	Limit    float64 // 0: the tolerance of the measure
	Factor   float64 // model-form factor φ ≥ 1
	Inner    float64 // factor in the test for invalid; 0: Factor
	Say      *Sentence
	Source   *cite.Source

	// Wait is the group that is missing where the estimate could not be made;
	// Hold is the value of it up to which (Least: from which) the assumption
	// holds, NaN where there is none.
	Waits bool
	Wait  group.ID
	Hold  float64
	Least bool

	Utilisation float64 // set by the judge

	// Groups are those of the mode that the part belongs to, where it is
	// another one than that of the answer; nil otherwise.
	Groups *group.Set
}

// Finding is the judgement of one assumption in one case.
type Finding struct {
	Verdict    Verdict
	OfInterest bool      // false: no part is of interest; reported, rules out nothing
	Reason     *Sentence // why it is not applicable
	Governing  int8      // index of the part that governs; −1: none
	Mode       int8      // number of the mode that it was judged for, where a case gives several; 0: one mode
	parts      []Part
	published  []Published
}

// Parts returns the estimates.
func (f *Finding) Parts() []Part { return f.parts }

// Main returns the part that governs, or nil.
func (f *Finding) Main() *Part {
	if f.Governing < 0 {
		return nil
	}
	return &f.parts[f.Governing]
}

// RulesOut reports whether the finding rules out a class that rests on it.
func (f *Finding) RulesOut() bool { return f.Verdict == Invalid && f.OfInterest }

// Utilisation returns that of the governing part, and whether there is one.
func (f *Finding) Utilisation() (float64, bool) {
	if p := f.Main(); p != nil && !p.Waits {
		return p.Utilisation, true
	}
	return 0, false
}

// Needs returns the groups that an undetermined finding waits for.
func (f *Finding) Needs(dst []group.ID) []group.ID {
	for i := range f.Parts() {
		p := &f.parts[i]
		if p.Waits {
			dst = append(dst, p.Wait)
		}
	}
	return dst
}

// Context is what an estimator sees: groups, traits, the tolerance, and the
// findings that were made before it. It has no way to a unit.
type Context struct {
	*group.Set
	Study
	Made  []Finding // by index in the catalogue
	f     *Finding
	arena []Part // parts of all findings, one after the other
	start int    // where those of the present finding begin
}

// Room is the number of parts that a case usually needs.
const Room = 80

// NewContext makes the context for a number of findings.
func NewContext(g *group.Set, s Study, findings int) *Context {
	x := contexts.Get().(*Context)
	made, arena := x.Made, x.arena
	if cap(made) < findings {
		made, arena = make([]Finding, findings), make([]Part, 0, Room)
	}
	made = made[:findings]
	clear(made)
	*x = Context{Set: g, Study: s, Made: made, arena: arena[:0]}
	return x
}

var contexts = sync.Pool{New: func() any { return new(Context) }}

// Release gives the memory of the findings back; nothing may use them
// afterwards.
func (x *Context) Release() { contexts.Put(x) }

// Study is how the analyst wants a case judged.
type Study struct {
	Tolerance Tolerance
	Interest  Interest
	Picked    Picks // the criteria that the case asks for
}

// Picks are the criteria that a case lets decide, one a field of the case.
type Picks [5]*Criterion

// Has reports whether a criterion was picked.
func (p *Picks) Has(c *Criterion) bool { return slices.Contains(p[:], c) }

// IDs lists the picked criteria by id, "" where none was picked.
func (p *Picks) IDs() string {
	ids := ""
	for _, c := range p {
		switch {
		case c == nil:
		case ids == "":
			ids = c.ID
		default:
			ids += ", " + c.ID
		}
	}
	return ids
}

// Begin directs what follows into a finding.
func (x *Context) Begin(f *Finding) {
	x.f = f
	x.start = len(x.arena)
	f.Governing = -1
}

// NotApplicable records that the effect cannot occur.
func (x *Context) NotApplicable(why *Sentence) { x.f.Reason = why }

// Add records one estimate.
func (x *Context) Add(p Part) {
	if p.Limit == 0 {
		p.Limit = x.Tolerance.Limit(p.Measure)
	}
	if p.Inner == 0 {
		p.Inner = p.Factor
	}
	if math.IsInf(p.Estimate, 1) { // a square that overflows: as bad as can be
		p.Estimate = MostUtilisation * p.Limit
	}
	x.arena = append(x.arena, p)
}

// Wait records an estimate that a missing group prevents. estimate is the
// estimate as a function of that group: increasing (the assumption holds up to
// a value), or decreasing (it holds from a value on).
func (x *Context) Wait(p Part, missing group.ID, estimate func(v float64) float64) {
	p.Waits = true
	p.Wait = missing
	if p.Limit == 0 {
		p.Limit = x.Tolerance.Limit(p.Measure)
	}
	p.Hold, p.Least = hold(estimate, p.Limit/p.Factor)
	x.Add(p)
}

// AddOrWait adds the part with the estimate at the group's value, or waits for
// the group where it is missing. A group that does not arise adds nothing.
func (x *Context) AddOrWait(p Part, id group.ID, estimate func(v float64) float64) {
	switch x.State(id) {
	case group.Known, group.Adopted:
		p.Estimate = estimate(x.Get(id))
		x.Add(p)
	case group.Missing:
		x.Wait(p, id, estimate)
	case group.OffRange:
		x.beyond(p)
	}
}

// beyond adds a part whose solved problem does not reach as far as the case:
// marginal, since nothing prices it.
func (x *Context) beyond(p Part) {
	p.Basis, p.Say = Threshold, beyondRange
	if p.Limit == 0 {
		p.Limit = x.Tolerance.Limit(p.Measure)
	}
	p.Estimate, p.Factor, p.Inner = p.Limit, 3, 3
	x.Add(p)
}

var beyondRange = Say("The solved problem behind this estimate does not reach as far as this case: taken at the limit {limit}.")

// Conclude is the judge: it gives the finding its verdict from its parts.
//
// The part with the largest u·φ governs, each part against its own limit and
// with its own φ. Parts whose measure is not of interest are left out; where
// none is of interest all are judged, and the finding rules out nothing.
func (x *Context) Conclude() {
	f := x.f
	f.parts = x.arena[x.start:len(x.arena):len(x.arena)]
	if len(f.parts) == 0 {
		f.Verdict = NotApplicable
		f.OfInterest = true
		if f.Reason == nil {
			f.Reason = notArising
		}
		return
	}
	f.Reason = nil
	f.OfInterest = false
	for i := range f.Parts() {
		p := &f.parts[i]
		f.OfInterest = f.OfInterest || x.Interest.Has(p.Measure)
		if !p.Waits {
			p.Utilisation = Utilisation(p.Estimate, p.Limit)
		}
	}
	f.Verdict = Valid
	worst, waiting := -1.0, int8(-1)
	for i := range f.Parts() {
		p := &f.parts[i]
		if f.OfInterest && !x.Interest.Has(p.Measure) {
			continue
		}
		if p.Waits {
			if waiting < 0 {
				waiting = int8(i)
			}
			continue
		}
		if v := Judge(p.Utilisation, p.Factor, p.Inner); v > f.Verdict {
			f.Verdict = v
		}
		if up := p.Utilisation * p.Factor; up > worst {
			worst, f.Governing = up, int8(i)
		}
	}
	if waiting >= 0 && f.Verdict != Invalid {
		f.Verdict = Undetermined
		f.Governing = waiting
	}
	if f.Verdict == Invalid && f.Governing >= 0 {
		f.promoteInvalid(x)
	}
}

// notArising is the reason where an estimator found nothing to estimate.
var notArising = Say("What this assumption leaves out does not arise in this case.")

// promoteInvalid lets an invalid part govern where a wider factor made a part
// that is only marginal look worse.
func (f *Finding) promoteInvalid(x *Context) {
	g := &f.parts[f.Governing]
	if Judge(g.Utilisation, g.Factor, g.Inner) == Invalid {
		return
	}
	worst := -1.0
	for i := range f.Parts() {
		p := &f.parts[i]
		if p.Waits || f.OfInterest && !x.Interest.Has(p.Measure) {
			continue
		}
		if Judge(p.Utilisation, p.Factor, p.Inner) == Invalid && p.Utilisation > worst {
			worst, f.Governing = p.Utilisation, int8(i)
		}
	}
}

// WorseThan orders findings of several modes: by verdict, then by u·φ.
func (f *Finding) WorseThan(g *Finding) bool {
	if f.Verdict != g.Verdict {
		return f.Verdict > g.Verdict
	}
	p, q := f.Main(), g.Main()
	if p == nil || q == nil {
		return p != nil
	}
	return p.Utilisation*p.Factor > q.Utilisation*q.Factor
}

// OfMode returns a copy of the finding that knows the mode it was judged for.
func (f *Finding) OfMode(number int, g *group.Set) Finding {
	c := *f
	c.Mode = int8(number)
	c.parts = append([]Part(nil), f.parts...)
	for i := range c.parts {
		c.parts[i].Groups = g
	}
	return c
}
