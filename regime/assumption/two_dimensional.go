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
	Estimated: "load: end effect L/ℓ of bluff bodies, 2/(2 + aspect ratio) of lift; scale: Re against 190 to 260, where the wake of a bluff body becomes three-dimensional",
	Measures:  []finding.Measure{finding.Load, finding.Scale},
	Sources:   []*cite.Source{cite.Williamson1996, cite.SumerFredsoe2006},
	Estimate:  estimateTwoDimensional,
}

var (
	tipEffect  = finding.Say("The tips change the lift by {e:%}: the aspect ratio is {aspect_ratio}.")
	endEffect  = finding.Say("The ends change the load by {e:%}: the span is 1/{span_ratio} lengths.")
	wavesDecay = finding.Say("Waves die out with depth and scatter all around: the flow differs from section to section.")
	wakeBreaks = finding.Say("At Re = {reynolds} the wake is {e} times the middle of the band from 190 to 260 in which it becomes three-dimensional.")
)

func estimateTwoDimensional(x *finding.Context) {
	switch {
	case !flows(x, group.Flow|group.Waves):
		return
	case x.Is(group.Waves):
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: wavesDecay, Source: cite.Newman1977})
		return
	}
	if x.Has(group.AspectRatio) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: tipEffect, Source: cite.BisplinghoffAshleyHalfman1955,
			Estimate: 2 / (2 + x.Get(group.AspectRatio))})
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 2, Say: endEffect, Source: cite.SumerFredsoe2006},
		group.SpanRatio, identity)
	if x.Is(group.Bluff) {
		x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: math.Sqrt(260.0 / 190), Say: wakeBreaks, Source: cite.Williamson1996},
			group.Reynolds, func(re float64) float64 { return re / math.Sqrt(190*260) })
	}
}
