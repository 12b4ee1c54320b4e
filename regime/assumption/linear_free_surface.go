package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// LinearFreeSurface: waves made by the motion are small.
var LinearFreeSurface = &Entry{
	ID:        "linear-free-surface",
	Title:     "Linear free surface",
	LeavesOut: "waves that are not small, and a surface that the body reaches",
	Estimated: "load: amplitude of the motion over the depth below the surface, the ratio of the second to the first order of the radiated wave",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.Newman1977, cite.ThisMethod},
	Estimate:  estimateLinearFreeSurface,
}

var linearSurface = finding.Say("The motion takes {e:%} of the depth below the surface.")

func estimateLinearFreeSurface(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Is(group.NearSurface):
		x.NotApplicable(noSurface)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 2, Say: linearSurface, Source: cite.Newman1977},
			group.DisplacementDepth, identity)
	}
}
