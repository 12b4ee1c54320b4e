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
	Estimated: "highest speed of operation over the critical speed u_c √(EI/m_a)/ℓ: π pinned, 2π clamped, 4.4934 clamped–pinned, π/2 for a cantilever with a tapered end; a vessel: external pressure over that which buckles it into lobes",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Paidoussis2016},
	Hazard:    "Buckling by flow bends a slender structure against its supports: the code in force and licensed practice decide.",
	Estimate: func(x *finding.Context) {
		if x.Is(group.Pulsatile) {
			addCollapse(x)
			return
		}
		source := cite.Paidoussis2016
		if x.Is(group.Internal) {
			source = cite.Paidoussis1998
		}
		hazardOfSpeed(x, group.BucklingSpeed, buckling, source, x.Factors.Buckling, noBuckling)
	},
}

// addCollapse holds the external pressure of a compliant tube against that
// under which it buckles into lobes.
func addCollapse(x *finding.Context) {
	if x.State(group.CollapsePressure) == group.Absent {
		x.NotApplicable(noSqueeze)
		return
	}
	addCollapsePart(x)
}

func addCollapsePart(x *finding.Context) {
	x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: 1.5, Say: collapse, Source: cite.TimoshenkoGere1961},
		group.CollapsePressure, identity)
}

var (
	buckling   = finding.Say("The highest speed of operation is {e} of the speed at which the flow buckles the structure.")
	noBuckling = finding.Say("No flow follows the length of a slender structure that its supports or its end would let buckle.")
)
