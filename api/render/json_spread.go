package render

import (
	"math"

	"regimed/regime"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// appendUncertainty says which inputs are uncertain and how they were sampled.
func appendUncertainty(dst []byte, a *regime.Answer) []byte {
	s := a.Spread
	dst = append(dst, `{"inputs":[`...)
	for _, p := range s.Inputs {
		q := a.Case.At(p)
		dst = append(comma(dst), '{')
		dst = member(dst, "input", p.Path())
		dst = member(dst, "pointer", p.Pointer())
		dst = member(dst, "form", q.Form.String())
		dst = number(dst, "value", q.Value)
		dst = number(dst, "spread", q.Spread)
		dst = append(member(dst, "unit", p.Kind().SI()), '}')
	}
	dst = append(dst, ']')
	dst = number(dst, "samples", float64(s.Samples))
	dst = number(dst, "outside", float64(s.Outside))
	return append(flag(dst, "settled", s.Settled), '}')
}

// appendGroupQuantiles appends how a group spreads, where it does.
func appendGroupQuantiles(dst []byte, a *regime.Answer, id group.ID) []byte {
	if a.Spread == nil {
		return dst
	}
	q, known := a.Spread.Groups[id]
	if !known {
		return dst
	}
	return appendQuantiles(dst, q)
}

func appendQuantiles(dst []byte, q regime.Quantiles) []byte {
	dst = append(name(dst, "quantiles"), '[')
	for _, x := range q {
		dst = value(comma(dst), x)
	}
	return append(dst, ']')
}

// appendFindingSpread appends how the utilisation of the i-th finding spreads, and
// how probable each verdict is: the three common ones always, the others where
// they occurred.
func appendFindingSpread(dst []byte, a *regime.Answer, i int) []byte {
	s := a.Spread
	if s == nil || s.Samples == 0 {
		return dst
	}
	if q := s.Utilisations[i]; !math.IsNaN(q[1]) {
		dst = appendQuantiles(dst, q)
	}
	p := &s.Verdicts[i]
	dst = append(appendVerdicts(append(name(dst, "probability"), '{'), p, func(p regime.Probability) float64 { return p.Share }), '}')
	return append(appendVerdicts(append(name(dst, "standard_error"), '{'), p, func(p regime.Probability) float64 { return p.StandardError }), '}')
}

// verdicts are those of a finding with probabilities, in the order in which they
// are shown; the last two only where they occurred.
var verdicts = []finding.Verdict{finding.Valid, finding.Marginal, finding.Invalid, finding.Undetermined, finding.NotApplicable}

func appendVerdicts(dst []byte, list *regime.VerdictProbability, of func(regime.Probability) float64) []byte {
	for i, v := range verdicts {
		if i < 3 || list[v].Share > 0 {
			dst = number(dst, v.String(), of(list[v]))
		}
	}
	return dst
}

// appendClassProbabilities appends how probable it is that each class is
// recommended, those that occurred.
func appendClassProbabilities(dst []byte, a *regime.Answer) []byte {
	s := a.Spread
	if s == nil || s.Samples == 0 {
		return dst
	}
	dst = append(name(dst, "probability"), '{')
	for _, c := range s.Classes {
		dst = number(dst, c.Class.ID, c.Share)
	}
	dst = append(name(append(dst, '}'), "standard_error"), '{')
	for _, c := range s.Classes {
		dst = number(dst, c.Class.ID, c.StandardError)
	}
	return append(dst, '}')
}
