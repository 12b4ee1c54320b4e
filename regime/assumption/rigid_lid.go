package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// RigidLid: the mean flow does not deform the surface. No class rests on it;
// it sets the axis free_surface of the resolved classes.
var RigidLid = &Entry{
	ID:        "rigid-lid",
	Title:     "Undeformed free surface",
	LeavesOut: "deformation of the free surface by the mean flow",
	Estimated: "load: ½ Fr², the rise U²/2g over the depth",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.Newman1977},
	Estimate:  estimateRigidLid,
}

var surfaceRise = finding.Say("The mean flow lifts the surface by {e:%} of the depth: Fr = {froude}.")

func estimateRigidLid(x *finding.Context) {
	switch {
	case !flows(x, group.Flow): // said why
	case !x.Is(group.NearSurface):
		x.NotApplicable(noSurface)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 2, Say: surfaceRise, Source: cite.Newman1977},
			group.Froude, func(fr float64) float64 { return fr * fr / 2 })
	}
}
