package regime

import (
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/scale"
)

// Mode is one of several modes of a case, with what it asks for by itself.
type Mode struct {
	Number       int
	FrequencyDry float64 // Hz; NaN where it is not known
	FrequencyWet float64
	Class        *ladder.Class     // recommended for this mode alone
	Worst        *assumption.Entry // its most loaded finding among those that the class of the answer rests on or falls by
	Utilisation  float64
}

// judgeModes answers a case with several modes: it is resolved once a mode,
// each finding is taken from the mode for which it is worst, and the class must
// hold for all of them.
func judgeModes(c *input.Case, modes *input.Value) (*Answer, []input.Violation) {
	plain := c.Without(kind.Modes)
	for _, f := range modes.Field.Row.Fields {
		if plain.Has(f) {
			return nil, []input.Violation{{Pointer: f.Pointer(), Code: input.Contradiction,
				Sentence: f.Path() + " is given beside structure.modes; give it in the mode it belongs to."}}
		}
	}
	var all []*Answer
	for _, row := range modes.Rows {
		one := plain
		for _, v := range row {
			one = one.With(v)
		}
		a, violations := judgeOne(one)
		if len(violations) > 0 {
			return nil, violations
		}
		all = append(all, a)
	}
	a := merge(all)
	a.Case = c
	return a, nil
}

// merge takes each finding from its worst mode. The scales and groups shown
// are those of the mode whose own class is the dearest.
func merge(all []*Answer) *Answer {
	base := all[0]
	for _, a := range all[1:] {
		if ladder.Dearer(a.Recommendation.Class, base.Recommendation.Class) {
			base = a
		}
	}
	merged := *base
	merged.judged = nil
	merged.Findings = make([]finding.Finding, len(base.Findings))
	for i := range merged.Findings {
		at := worstMode(all, i)
		merged.Findings[i] = all[at].Findings[i].OfMode(at+1, all[at].Groups)
	}
	merged.Recommendation = ladder.Choose(base.Kind.Name, base.Groups, merged.Findings)
	for i, a := range all {
		m := Mode{Number: i + 1, FrequencyDry: a.Scales.X(scale.FrequencyDry), FrequencyWet: a.Scales.X(scale.FrequencyWet), Class: a.Recommendation.Class}
		m.Worst, m.Utilisation = mostLoaded(a)
		merged.Modes = append(merged.Modes, m)
	}
	return &merged
}

// worstMode is the index of the mode whose finding is worst: invalid before
// undetermined before marginal, then by u·φ.
func worstMode(all []*Answer, i int) int {
	worst := 0
	for at := range all {
		if all[at].Findings[i].WorseThan(&all[worst].Findings[i]) {
			worst = at
		}
	}
	return worst
}

// mostLoaded is the finding nearest to its limit, or furthest beyond, among
// those on which the recommended class rests.
func mostLoaded(a *Answer) (*assumption.Entry, float64) {
	var worst *assumption.Entry
	most := 0.0
	for _, e := range a.Recommendation.Class.RestsOn {
		if u, ok := a.Findings[e.Index()].Utilisation(); ok && u > most {
			worst, most = e, u
		}
	}
	return worst, most
}
