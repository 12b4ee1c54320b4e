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
	Estimated: "stability: −Cp_min/σ of the mean flow; ρω²ξL/(p − p_v) of the oscillation",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Brennen1995},
	Estimate:  estimateCavitation,
}

var (
	cavitationFlow   = finding.Say("The suction peak of {suction_peak} dynamic pressures stands against a cavitation number of {cavitation}.")
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
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.3, Say: cavitationFlow, Source: cite.Brennen1995}
	switch {
	case !x.Any(group.Flow):
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
