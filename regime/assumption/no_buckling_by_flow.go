package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoBucklingByFlow: the centrifugal force of the flow does not buckle it.
var NoBucklingByFlow = &Entry{
	ID:        "no-buckling-by-flow",
	Title:     "No buckling by the flow",
	LeavesOut: "the centrifugal force of a flow that follows a bent structure",
	Estimated: "highest speed of operation over the critical speed u_c √(EI/m_a)/ℓ: π pinned, 2π clamped, 4.4934 clamped–pinned, π/2 for a cantilever with a tapered end",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Paidoussis2016},
	Hazard:    "Buckling by flow bends a slender structure against its supports: the code in force and licensed practice decide.",
	Estimate: func(x *finding.Context) {
		hazardOfSpeed(x, group.BucklingSpeed, buckling, cite.Paidoussis2016, x.Factors.Buckling, noBuckling)
	},
}

var (
	buckling   = finding.Say("The highest speed of operation is {e} of the speed at which the flow buckles the structure.")
	noBuckling = finding.Say("No flow follows the length of a slender structure that its supports or its end would let buckle.")
)
