package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// Continuum: the gas is a continuum that sticks to the walls.
var Continuum = &Entry{
	ID:        "continuum",
	Title:     "Continuum without slip",
	LeavesOut: "rarefaction: slip at the walls",
	Estimated: "scale: Knudsen number against 0.01",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.GadElHak1999},
	Estimate:  estimateContinuum,
}

var (
	rarefied = finding.Say("The mean free path is {knudsen} of the length; slip shows from 0.01 on, and the strictest author sets 0.001.")
)

func estimateContinuum(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case x.Is(group.Liquid):
		x.NotApplicable(liquidIsDense)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.01, Factor: 1.5, Say: rarefied, Source: cite.GadElHak1999},
			group.Knudsen, identity)
	}
}
