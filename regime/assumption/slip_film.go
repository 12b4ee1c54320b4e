package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// SlipFilm: a film with slip at its walls.
var SlipFilm = &Entry{
	ID:        "slip-film",
	Title:     "Film with slip",
	LeavesOut: "free molecular flow beyond the effective viscosity of a rarefied film",
	Estimated: "scale: Knudsen number of the gap against 880, the end of the range of the effective viscosity",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Veijola1995},
	Estimate:  estimateSlipFilm,
}

var slipFilm = finding.Say("The mean free path is {knudsen} of the gap; the effective viscosity of the film holds to 880.")

func estimateSlipFilm(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Is(group.Film):
		x.NotApplicable(noGap)
	case x.Is(group.Liquid):
		x.NotApplicable(liquidIsDense)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 880, Factor: 1.15, Say: slipFilm, Source: cite.Veijola1995},
			group.Knudsen, identity)
	}
}
