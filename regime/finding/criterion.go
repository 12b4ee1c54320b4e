package finding

import "regimed/regime/cite"

// Criterion is a screen that a code or standard sets for an assumption.
type Criterion struct {
	ID         string
	Assumption string // id of the assumption that it screens
	Field      string // name under `criteria` in a case that picks it
	Standard   string
	Edition    string
	Clause     string
	Formula    string
	Source     *cite.Source
	// Applies says for which cases the standard is written.
	Applies func(x *Context) bool
	// Estimate is demand over capacity: up to 1 the hazard is excluded. ok is
	// false where a group is missing.
	Estimate func(x *Context) (utilisation float64, ok bool)
	Say      *Sentence
}

// Published is what one criterion says of a case.
type Published struct {
	Criterion   *Criterion
	Verdict     Verdict
	Utilisation float64
	Picked      bool // the case asked for it: it decides
}

// Published returns what the criteria of standards say beside the physical model.
func (f *Finding) Published() []Published { return f.published }

// Publish evaluates the criteria that apply to an assumption. The one that the
// case picked replaces the physical model's estimates; it must apply to decide.
func (x *Context) Publish(list []*Criterion, assumption string) {
	for _, c := range list {
		if c.Assumption != assumption {
			continue
		}
		picked := x.Picked.Has(c)
		if !picked && !c.Applies(x) {
			continue
		}
		u, ok := c.Estimate(x)
		if !ok {
			continue
		}
		u = Utilisation(u, 1)
		x.f.published = append(x.f.published, Published{Criterion: c, Verdict: Judge(u, 1, 1), Utilisation: u, Picked: picked})
		if picked {
			x.arena = x.arena[:x.start]
			x.Add(Part{Measure: Stability, Basis: Threshold, Estimate: u, Limit: 1, Factor: 1, Say: c.Say, Source: c.Source})
		}
	}
}
