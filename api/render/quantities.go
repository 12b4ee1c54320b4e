package render

import (
	"math"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
)

// formulaOf holds the common formula of each group, nil where there is none.
var formulaOf = func() (list [group.Count]*kind.Formula) {
	for id := range group.Count {
		list[id] = kind.FormulaOf(id)
	}
	return list
}()

// shownGroup reports whether an answer lists a group: the core ones always,
// the others where they arise.
func shownGroup(g *group.Set, id group.ID) bool {
	return group.Of(id).Core || g.Has(id) || g.State(id) == group.Missing
}

// withKey is the name under which a group shows a scale: the symbol, or the
// id where another scale of the same group has that symbol too.
func withKey(from []scale.ID, i int) string {
	symbol := scale.Of(from[i]).Symbol
	for j, id := range from {
		if j != i && scale.Of(id).Symbol == symbol {
			return scale.Of(from[i]).ID
		}
	}
	return symbol
}

// frequency is one row of the list of frequencies.
type frequency struct {
	id, title string
	value     float64 // Hz
}

const maxFrequencies = 7

// frequencies lists those that are known, in Hz.
func frequencies(dst []frequency, a *regime.Answer) []frequency {
	add := func(id, title string, x float64) {
		if x > 0 && !math.IsInf(x, 0) {
			dst = append(dst, frequency{id, title, x})
		}
	}
	s, g := a.Scales, a.Groups
	wet := s.X(scale.FrequencyWet)
	add("dry", "natural frequency, dry", s.X(scale.FrequencyDry))
	add("wet", "natural frequency, wet", wet)
	add("next_mode", "next mode, dry", s.X(scale.NextFrequency))
	if s.Value(scale.FrequencyMotion).Origin == scale.Given {
		add("motion", "forced motion", s.X(scale.FrequencyMotion))
	}
	add("shedding", "vortex shedding of the fixed body", g.Get(group.Strouhal)*s.X(scale.Speed)/s.X(scale.Length))
	add("coincidence", "coincidence", s.X(scale.CoincidenceFrequency))
	add("cavity", "first acoustic resonance of the cavity", wet/g.Get(group.CavityFrequency))
	return dst
}

// textOf returns a free text of the case, and whether it was given.
func textOf(a *regime.Answer, f *input.Field) (string, bool) {
	if a.Case == nil {
		return "", false
	}
	if v := a.Case.Lookup(f); v != nil {
		return v.Text, true
	}
	return "", false
}
