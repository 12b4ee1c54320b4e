package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoStall: the flow stays attached at incidence.
var NoStall = &Entry{
	ID:        "no-stall",
	Title:     "No stall",
	LeavesOut: "separation at incidence",
	Estimated: "stability: (|α| + ωξ/U)/α_stall",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.BisplinghoffAshleyHalfman1955},
	Estimate:  estimateStall,
}

var (
	stall       = finding.Say("Incidence and motion together make {e} of the stall angle.")
	neverStalls = finding.Say("The body has no attached flow that could stall.")
)

func estimateStall(x *finding.Context) {
	switch {
	case !flows(x, group.Flow):
		return
	case !x.Is(group.Streamlined) || x.Is(group.PanelLike):
		x.NotApplicable(neverStalls)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.3, Say: stall, Source: cite.BisplinghoffAshleyHalfman1955}
	steady := orZero(x, group.StallRatio)
	if x.Is(group.StaticOnly) || x.State(group.MotionSpeedRatio) == group.Absent {
		p.Estimate = steady
		x.Add(p)
		return
	}
	perAngle := x.StallPerRadian
	x.AddOrWait(p, group.MotionSpeedRatio, func(v float64) float64 { return steady + math.Atan(v)*perAngle })
}
