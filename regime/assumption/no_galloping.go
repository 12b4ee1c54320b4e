package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoGalloping: the section does not gallop.
var NoGalloping = &Entry{
	ID:        "no-galloping",
	Title:     "No galloping",
	LeavesOut: "negative flow damping of a section whose lift falls with incidence",
	Estimated: "highest speed of operation over the onset speed 2 Sc f b/a_G",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.DenHartog1956, cite.EN1991Galloping},
	Hazard:    "Galloping grows without a limit of its own: the code in force and a wind-tunnel test of the section decide.",
	Estimate:  estimateGalloping,
}

var (
	galloping      = finding.Say("The highest speed of operation is {e} of the onset speed of galloping.")
	circleNoGallop = finding.Say("A circle has no transverse force that changes with incidence.")
	noGallopShape  = finding.Say("The flow does not run across a bluff section.")
)

func estimateGalloping(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Any(group.Flow):
		x.NotApplicable(noFlow)
	case !x.Is(group.Cross | group.Bluff):
		x.NotApplicable(noGallopShape)
	case x.Is(group.Circular):
		x.NotApplicable(circleNoGallop)
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: 1.5,
			Say: galloping, Source: cite.DenHartog1956}, group.GallopingSpeed, identity)
	}
}
