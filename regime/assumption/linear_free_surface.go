package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// LinearFreeSurface: the waves are small.
var LinearFreeSurface = &Entry{
	ID:        "linear-free-surface",
	Title:     "Linear free surface",
	LeavesOut: "waves and sloshing that are not small, and a surface that the body reaches",
	Estimated: "load: second-order over first-order elevation of the waves; without waves the amplitude of the motion over the depth below the surface or the draft, the ratio of the second to the first order of the radiated wave; scale: wave amplitude at the wall of a tank over min(0.1 h, 0.05 L)",
	Measures:  []finding.Measure{finding.Load, finding.Scale},
	Sources:   []*cite.Source{cite.Newman1977, cite.DeanDalrymple1991, cite.Abramson1966},
	Estimate:  estimateLinearFreeSurface,
}

var (
	linearSurface = finding.Say("The motion takes {e:%} of the depth below the surface.")
	linearWaves   = finding.Say("The second order of the waves is {e:%} of the first: H/λ = {wave_steepness}.")
	linearSlosh   = finding.Say("The wave at the wall is {sloshing_amplitude} of what linear sloshing bears, 0.1 of the liquid depth or 0.05 of the length.")
	shallowSlosh  = finding.Say("The wave at the wall is {sloshing_amplitude} of what linear sloshing bears; at h/L = {fill_ratio}, below 0.337, resonance hardens and bores travel.")
)

// criticalFill is h/L below which the first sloshing resonance hardens (Abramson
// 1966, from memory; for plane waves in a rectangular tank).
const criticalFill = 0.337

func estimateLinearFreeSurface(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case x.Is(group.Sloshing):
		linearSloshing(x)
	case x.Is(group.Waves):
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.15, Say: linearWaves, Source: cite.DeanDalrymple1991},
			group.SecondOrder, identity)
	case !x.Is(group.NearSurface):
		x.NotApplicable(noSurface)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 2, Say: linearSurface, Source: cite.Newman1977},
			group.DisplacementDepth, identity)
	}
}

func linearSloshing(x *finding.Context) {
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 1, Factor: 2, Say: linearSlosh, Source: cite.Abramson1966}
	if x.Has(group.FillRatio) && x.Get(group.FillRatio) < criticalFill {
		p.Factor, p.Say = 3, shallowSlosh
	}
	x.AddOrWait(p, group.SloshingAmplitude, identity)
}
