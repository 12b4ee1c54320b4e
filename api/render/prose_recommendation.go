package render

import (
	"slices"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/ladder"
	"regimed/units"
)

func appendClass(dst []byte, c *ladder.Class) []byte {
	dst = append(dst, c.Title...)
	dst = append(dst, " ("...)
	dst = append(dst, c.ID...)
	return append(dst, ')')
}

// appendClassSentence says why the class is recommended.
func appendClassSentence(dst []byte, r *ladder.Recommendation) []byte {
	switch {
	case len(r.Class.RestsOn) == 0:
		dst = append(dst, "No cheaper class holds, so "...)
		dst = appendClass(dst, r.Class)
		dst = append(dst, " is recommended, which rests on no assumption: it solves "...)
	case len(r.Rejected) == 0:
		dst = appendClass(dst, r.Class)
		dst = append(dst, " is the cheapest class that can be asked for in this case, and it holds: it solves "...)
	default:
		dst = appendClass(dst, r.Class)
		dst = append(dst, " is the cheapest class that holds: it solves "...)
	}
	dst = append(dst, r.Class.Solves...)
	return append(dst, '.')
}

// held lists the assumptions of the recommended class that are valid and have
// a price, most loaded first.
func held(dst []*assumption.Entry, a *regime.Answer) []*assumption.Entry {
	for _, e := range a.Recommendation.Class.RestsOn {
		f := &a.Findings[e.Index()]
		if f.Verdict == finding.Valid && f.OfInterest {
			dst = append(dst, e)
		}
	}
	slices.SortStableFunc(dst, func(x, y *assumption.Entry) int {
		switch lx, ly := load(&a.Findings[x.Index()]), load(&a.Findings[y.Index()]); {
		case lx > ly:
			return -1
		case lx < ly:
			return 1
		}
		return 0
	})
	return dst
}

// load is u·φ, by which assumptions are ordered; 0 where there is none.
func load(f *finding.Finding) float64 {
	if u, ok := f.Utilisation(); ok {
		return u * f.Main().Factor
	}
	return 0
}

// appendHeld says that an assumption holds, at what price and against which
// limit.
func appendHeld(dst []byte, a *regime.Answer, e *assumption.Entry) []byte {
	p := a.Findings[e.Index()].Main()
	dst = append(dst, e.Title...)
	dst = append(dst, " ("...)
	dst = append(dst, e.ID...)
	dst = append(dst, ") holds: "...)
	return append(appendPrice(dst, a, p), '.')
}

func appendPrice(dst []byte, a *regime.Answer, p *finding.Part) []byte {
	share := isShare(a, p)
	switch {
	case p.Estimate == 0:
		return append(dst, "it costs nothing here"...)
	case share && p.Measure == finding.Frequency:
		dst = append(dst, "it costs an error of "...)
		dst = appendPercent(dst, p.Estimate)
		dst = append(dst, " in the natural frequency"...)
	case share && p.Measure == finding.Response:
		dst = append(dst, "it leaves out "...)
		dst = appendPercent(dst, p.Estimate)
		dst = append(dst, " of the damping"...)
	case share && p.Measure == finding.Load:
		dst = append(dst, "it costs an error of "...)
		dst = appendPercent(dst, p.Estimate)
		dst = append(dst, " in the load"...)
	case share:
		dst = append(dst, "it leaves out "...)
		dst = appendPercent(dst, p.Estimate)
		dst = append(dst, " of the sound"...)
	case p.Measure == finding.Stability:
		dst = append(dst, "the demand is "...)
		dst = units.AppendNumber(dst, p.Estimate, digits)
	default:
		dst = append(dst, "its measure stands at "...)
		dst = units.AppendNumber(dst, p.Estimate, digits)
	}
	dst = append(dst, ", and the limit is "...)
	return appendAmount(dst, p.Limit, share)
}

// moot lists the assumptions of the recommended class whose effects cannot
// occur.
func moot(dst []*assumption.Entry, a *regime.Answer) []*assumption.Entry {
	for _, e := range a.Recommendation.Class.RestsOn {
		if a.Findings[e.Index()].Verdict == finding.NotApplicable {
			dst = append(dst, e)
		}
	}
	return dst
}

func appendMoot(dst []byte, list []*assumption.Entry) []byte {
	dst = append(dst, "It also rests on "...)
	dst = appendIDs(dst, list, " and ")
	if len(list) == 1 {
		return append(dst, ", whose effect cannot occur in this case."...)
	}
	return append(dst, ", whose effects cannot occur in this case."...)
}

// appendIDs appends "a, b and c", with the word that stands before the last.
func appendIDs(dst []byte, list []*assumption.Entry, last string) []byte {
	for i, e := range list {
		switch {
		case i > 0 && i == len(list)-1:
			dst = append(dst, last...)
		case i > 0:
			dst = append(dst, ", "...)
		}
		dst = append(dst, e.ID...)
	}
	return dst
}

// appendRejected says why a cheaper class fell: all assumptions by name, the
// worst of them with its numbers.
func appendRejected(dst []byte, a *regime.Answer, r *ladder.Rejected) []byte {
	dst = append(dst, r.Class.Title...)
	if len(r.Because) == 0 {
		return append(dst, " does not hold."...)
	}
	dst = append(dst, " is ruled out by "...)
	dst = appendIDs(dst, r.Because, " and ")
	worst := worstOf(a, r.Because)
	if len(r.Because) == 1 {
		dst = append(dst, ", since "...)
	} else {
		dst = append(dst, "; by "...)
		dst = append(dst, worst.ID...)
		dst = append(dst, " most of all, since "...)
	}
	f := &a.Findings[worst.Index()]
	dst = appendEstimate(dst, a, f.Main(), true)
	return append(dst, '.')
}

func worstOf(a *regime.Answer, list []*assumption.Entry) *assumption.Entry {
	worst := list[0]
	for _, e := range list[1:] {
		if load(&a.Findings[e.Index()]) > load(&a.Findings[worst.Index()]) {
			worst = e
		}
	}
	return worst
}

// appendCondition says what has to be verified before the class may be used.
func appendCondition(dst []byte, a *regime.Answer, e *assumption.Entry) []byte {
	f := &a.Findings[e.Index()]
	dst = append(dst, e.Title...)
	dst = append(dst, " ("...)
	dst = append(dst, e.ID...)
	if p := f.Main(); p != nil && !p.Waits {
		dst = append(dst, ") is marginal and has to be verified, since the estimate lies within the model-form factor "...)
		dst = units.AppendNumber(dst, p.Factor, digits)
		dst = append(dst, " of the limit: "...)
		dst = appendEstimate(dst, a, p, true)
		return append(dst, '.')
	}
	dst = append(dst, ") is not determined, since "...)
	dst = appendMissing(dst, a, f)
	if c := wouldBecome(a, e); c != nil {
		dst = append(dst, "; if it fails, the class becomes "...)
		dst = appendClass(dst, c)
	}
	return append(dst, '.')
}

func wouldBecome(a *regime.Answer, e *assumption.Entry) *ladder.Class {
	for i := range a.Recommendation.IfSettled {
		if s := &a.Recommendation.IfSettled[i]; s.Entry == e {
			return s.Class
		}
	}
	return nil
}

// isActive reports whether a hazard carries its caution: it is there, or it
// cannot be excluded.
func isActive(f *finding.Finding) bool {
	switch f.Verdict {
	case finding.Invalid, finding.Marginal, finding.Undetermined:
		return true
	}
	return false
}
