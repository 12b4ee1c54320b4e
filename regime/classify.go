package regime

import (
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/setup"
)

// Classify is the whole story: a case becomes scales, scales become groups,
// groups are judged, the cheapest class that holds is recommended, and figures
// for setting it up follow.
func Classify(c *input.Case) (*Answer, []input.Violation) {
	a, violations := Judge(c)
	if len(violations) > 0 {
		return nil, violations
	}
	a.Setup = setup.Figures(a.Scales, a.Groups, &a.Recommendation)
	return a, nil
}

// Judge is Classify without the figures for setting up: what is asked by the
// thousand where an input is varied.
func Judge(c *input.Case) (*Answer, []input.Violation) {
	if modes := c.Lookup(kind.Modes); modes != nil {
		return judgeModes(c, modes)
	}
	return judgeOne(c)
}

func judgeOne(c *input.Case) (*Answer, []input.Violation) {
	resolved, warnings, violations := kind.Resolve(c)
	if len(violations) > 0 {
		return nil, violations
	}
	a := Decide(resolved, kind.StudyOf(c))
	a.Case, a.Warnings = c, warnings
	return a, nil
}

// Decide goes from a resolved case to the recommendation: the core.
func Decide(r *kind.Resolved, s finding.Study) *Answer {
	a := &Answer{Kind: r.Kind, Scales: r.Scales, Study: s}
	a.Groups = r.Groups()
	a.judged = assumption.Judge(a.Groups, s)
	a.Findings = a.judged.Made
	a.Recommendation = ladder.Choose(r.Kind.Name, a.Groups, a.Findings)
	return a
}

// Release gives the memory of an answer back to the next case; nothing may use
// the answer afterwards. The scales of a resolved case that was decided on
// directly stay with it. Whoever does not call it leaves it to the collector.
func (a *Answer) Release() {
	if a.Case != nil {
		a.Scales.Release()
	}
	a.Groups.Release()
	if a.judged != nil {
		a.judged.Release()
	}
	*a = Answer{}
}
