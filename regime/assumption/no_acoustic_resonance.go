package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoAcousticResonance: no standing sound wave meets the mode.
var NoAcousticResonance = &Entry{
	ID:        "no-acoustic-resonance",
	Title:     "No acoustic resonance of the cavity",
	LeavesOut: "a standing sound wave at the frequency of the mode",
	Estimated: "position of the wet frequency in 0.8 … 1.25 of the first acoustic frequency of the cavity, c/(2d)",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.ThisMethod, cite.KinslerFrey2000},
	Hazard:    "A structure in resonance with a closed cavity is loud and can fatigue: measure before it goes into service.",
	Estimate:  estimateAcousticResonance,
}

var (
	cavityResonance = finding.Say("The wet frequency is {cavity_frequency} of the first acoustic frequency of the cavity.")
	noCavity        = finding.Say("There is no closed cavity.")
)

// Band of a resonance: within a quarter of coincidence, a judgement that
// covers the width of a lightly damped resonance and the error of both
// frequencies.
const resonanceLow, resonanceHigh = 0.8, 1.25

func estimateAcousticResonance(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.Cavity):
		x.NotApplicable(noCavity)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.15, Say: cavityResonance, Source: cite.ThisMethod}
	if x.Has(group.CavityFrequency) {
		p.Estimate, p.Inner = finding.Band(x.Get(group.CavityFrequency), resonanceLow, resonanceHigh, p.Factor)
		x.Add(p)
		return
	}
	waitOn(x, p, group.CavityFrequency)
}
