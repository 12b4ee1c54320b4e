package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoCavitation: the liquid does not boil.
var NoCavitation = &Entry{
	ID:        "no-cavitation",
	Title:     "No cavitation",
	LeavesOut: "vapour where the pressure falls to the vapour pressure",
	Estimated: "stability: −Cp_min/σ of the mean flow; ρω²ξL/(p − p_v) of the oscillation; Δp/(p − p_v) of a surge, column separation",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Brennen1995},
	Estimate:  estimateCavitation,
}

var (
	cavitationFlow   = finding.Say("The suction peak of {suction_peak} dynamic pressures stands against a cavitation number of {cavitation}.")
	alreadyTwoPhase  = finding.Say("The flow is a mixture of liquid and gas by itself: {void_fraction:%} of its volume is gas.")
	cavitationBore   = finding.Say("A straight bore has no suction peak of its own; valves, orifices and bends are not in the case.")
	separation       = finding.Say("The surge is {e} of what parts the liquid from its vapour pressure; the wave comes back as a fall of as much, and the column separates.")
	columnHolds      = finding.Say("The surge is {e} of what parts the liquid from its vapour pressure; the wave comes back as a fall of as much, and the column holds.")
	separationSudden = finding.Say("Even a sudden change of the flow makes a wave of only {e} of what parts the liquid from its vapour pressure.")
	cavitationMotion = finding.Say("The pressure of the oscillation is {e} of what parts the liquid from its vapour pressure.")
)

func estimateCavitation(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case x.Is(group.Gas):
		x.NotApplicable(gasCannot)
		return
	case x.Is(group.TwoPhase):
		x.NotApplicable(alreadyTwoPhase)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.3, Say: cavitationFlow, Source: cite.Brennen1995}
	if x.Is(group.Shock) {
		x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: 1.5, Say: shockCavity, Source: cite.Taylor1941},
			group.ShockTension, identity)
	}
	if x.Is(group.Column) {
		part := p
		part.Factor, part.Say, part.Source = 1.5, separation, cite.WylieStreeter1993
		if x.Has(group.ColumnSeparation) && x.Get(group.ColumnSeparation) < 1 {
			part.Say = columnHolds
		}
		addSurge(x, part, group.ColumnSeparation, group.ColumnSeparationSudden, separationSudden)
	}
	switch {
	case !x.Any(group.Flow):
	case x.Is(group.Internal):
		p.Basis, p.Say = finding.Definition, cavitationBore
		x.Add(p)
		p.Basis = finding.Threshold
	case !x.Has(group.SuctionPeak):
		waitOn(x, p, group.SuctionPeak)
	default:
		peak := x.Get(group.SuctionPeak)
		x.AddOrWait(p, group.Cavitation, func(sigma float64) float64 {
			if sigma <= 0 {
				return 1e6
			}
			return peak / sigma
		})
	}
	if x.Is(group.StaticOnly) {
		x.NotApplicable(noMotion)
		return
	}
	p.Say, p.Factor = cavitationMotion, 2
	x.AddOrWait(p, group.OscillationPressure, identity)
}
