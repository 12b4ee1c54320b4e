package render

import (
	"math"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
)

func appendFindings(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '{')
	for i := range assumption.Catalogue {
		dst = append(comma(dst), findingHeads[i]...)
		dst = appendFinding(dst, a, &a.Findings[i])
		dst = appendFindingSpread(dst, a, i)
		dst = append(appendDrivers(dst, a, i), '}')
	}
	return append(dst, '}')
}

func appendFinding(dst []byte, a *regime.Answer, f *finding.Finding) []byte {
	p := f.Main()
	if p != nil {
		dst = member(dst, "measure", p.Measure.String())
	}
	dst = member(dst, "verdict", f.Verdict.String())
	dst = flag(dst, "of_interest", f.OfInterest)
	if f.Mode > 0 {
		dst = number(dst, "mode", float64(f.Mode))
	}
	if p != nil {
		dst = appendFigures(dst, p)
	}
	dst, start := open(name(dst, "because"))
	dst = seal(appendBecause(dst, a, f), start)
	if p != nil && p.Source != nil {
		dst, start = open(name(dst, "source"))
		dst = seal(appendSource(dst, p.Source), start)
	}
	if p != nil && p.Waits {
		dst = appendNeeds(dst, a, f)
	}
	dst = appendParts(dst, a, f)
	return appendPublished(dst, f)
}

// appendFigures appends the numbers of an estimate; those that an estimate
// which waits has not are null.
func appendFigures(dst []byte, p *finding.Part) []byte {
	e, u, m := p.Estimate, p.Utilisation, math.NaN()
	if p.Waits {
		e, u = math.NaN(), math.NaN()
	} else {
		m = finding.Margin(u)
	}
	dst = number(dst, "estimate", e)
	dst = number(dst, "limit", p.Limit)
	dst = number(dst, "utilisation", u)
	dst = number(dst, "factor", p.Factor)
	dst = number(dst, "margin", m)
	return member(dst, "basis", p.Basis.String())
}

func appendNeeds(dst []byte, a *regime.Answer, f *finding.Finding) []byte {
	var room [6]hold
	list := holds(room[:0], a, f)
	dst = append(name(dst, "holds_up_to"), '[')
	for i := range list {
		h := &list[i]
		if math.IsNaN(h.value) {
			continue
		}
		dst = append(comma(dst), '{')
		dst = member(dst, "input", h.input)
		dst = number(dst, "value", h.value)
		dst = member(dst, "unit", h.unit)
		dst = append(member(dst, "bound", bound(h)), '}')
	}
	dst = append(dst, ']')
	return appendInputs(name(dst, "needs"), list)
}

// appendInputs appends the missing inputs, each once.
func appendInputs(dst []byte, list []hold) []byte {
	dst = append(dst, '[')
	for i := range list {
		if list[i].named && !seen(list[:i], list[i].input) {
			dst = element(dst, list[i].input)
		}
	}
	return append(dst, ']')
}

func bound(h *hold) string {
	if h.least {
		return "at least"
	}
	return "at most"
}

// appendParts appends the estimates beside the one that governs.
func appendParts(dst []byte, a *regime.Answer, f *finding.Finding) []byte {
	if len(f.Parts()) < 2 {
		return dst
	}
	dst = append(name(dst, "parts"), '[')
	for i := range f.Parts() {
		if i != int(f.Governing) {
			dst = append(appendPart(append(comma(dst), '{'), a, &f.Parts()[i]), '}')
		}
	}
	return append(dst, ']')
}

func appendPart(dst []byte, a *regime.Answer, p *finding.Part) []byte {
	verdict := finding.Undetermined
	if !p.Waits {
		verdict = finding.Judge(p.Utilisation, p.Factor, p.Inner)
	}
	dst = member(dst, "measure", p.Measure.String())
	dst = member(dst, "verdict", verdict.String())
	dst = flag(dst, "of_interest", a.Interest.Has(p.Measure))
	dst = appendFigures(dst, p)
	dst, start := open(name(dst, "because"))
	dst = seal(appendPartBecause(dst, a, p), start)
	if p.Source != nil {
		dst, start = open(name(dst, "source"))
		dst = seal(appendSource(dst, p.Source), start)
	}
	return dst
}

// appendPublished appends what the criteria of standards say.
func appendPublished(dst []byte, f *finding.Finding) []byte {
	list := f.Published()
	if len(list) == 0 {
		return dst
	}
	dst = append(name(dst, "published"), '[')
	for i := range list {
		c := list[i].Criterion
		dst = append(comma(dst), '{')
		dst = member(dst, "criterion", c.ID)
		dst = member(dst, "standard", c.Standard)
		dst = member(dst, "edition", c.Edition)
		dst = member(dst, "clause", c.Clause)
		dst = member(dst, "formula", c.Formula)
		dst = member(dst, "verdict", list[i].Verdict.String())
		dst = number(dst, "limit", 1)
		dst = number(dst, "utilisation", list[i].Utilisation)
		dst = flag(dst, "picked", list[i].Picked)
		if c.Source != nil {
			var start int
			dst, start = open(name(dst, "source"))
			dst = seal(appendSource(dst, c.Source), start)
		}
		dst = append(dst, '}')
	}
	return append(dst, ']')
}
