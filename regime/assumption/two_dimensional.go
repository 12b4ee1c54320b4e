package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// TwoDimensional: the flow is the same at every section. No class rests on it;
// it sets the axis dimensions.
var TwoDimensional = &Entry{
	ID:        "two-dimensional",
	Title:     "Two-dimensional flow",
	LeavesOut: "effects along the span: ends, and wakes that break up",
	Estimated: "load: end effect L/ℓ of bluff bodies; scale: Re against 190 to 260, where the wake of a bluff body becomes three-dimensional",
	Measures:  []finding.Measure{finding.Load, finding.Scale},
	Sources:   []*cite.Source{cite.Williamson1996, cite.SumerFredsoe2006},
	Estimate:  estimateTwoDimensional,
}

var (
	endEffect  = finding.Say("The ends change the load by {e:%}: the span is 1/{span_ratio} lengths.")
	wakeBreaks = finding.Say("At Re = {reynolds} the wake is {e} times the middle of the band from 190 to 260 in which it becomes three-dimensional.")
)

func estimateTwoDimensional(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Any(group.Flow):
		x.NotApplicable(noFlow)
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 2, Say: endEffect, Source: cite.SumerFredsoe2006},
		group.SpanRatio, identity)
	if x.Is(group.Bluff) {
		x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: math.Sqrt(260.0 / 190), Say: wakeBreaks, Source: cite.Williamson1996},
			group.Reynolds, func(re float64) float64 { return re / math.Sqrt(190*260) })
	}
}
