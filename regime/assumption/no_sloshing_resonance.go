package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoSloshingResonance: the excitation keeps off the sloshing modes.
var NoSloshingResonance = &Entry{
	ID:        "no-sloshing-resonance",
	Title:     "No sloshing resonance",
	LeavesOut: "an excitation at a sloshing mode that it can excite",
	Estimated: "position of the frequency of the excitation in 0.8 … 1.25 of the first and of the third sloshing mode; a lateral motion excites no even ones",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Abramson1966, cite.ThisMethod},
	Hazard:    "Sloshing in resonance loads roof and walls by impact, far above any linear estimate: baffles, another fill or another frequency come first.",
	Estimate:  estimateSloshingResonance,
}

var (
	sloshingFirst    = finding.Say("The excitation runs at {sloshing_ratio} times the first sloshing frequency.")
	sloshingThird    = finding.Say("The excitation runs at {sloshing_ratio_third} times the third sloshing frequency.")
	sloshingSpectrum = finding.Say("The excitation is a spectrum: its acceleration at the sloshing frequency holds the resonance already.")
)

func estimateSloshingResonance(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Is(group.Sloshing):
		x.NotApplicable(noTank)
	case x.Is(group.Spectrum):
		x.NotApplicable(sloshingSpectrum)
	default:
		addResonance(x, group.SloshingRatio, sloshingFirst, cite.Abramson1966)
		addResonance(x, group.SloshingRatioThird, sloshingThird, cite.Abramson1966)
		x.Publish(criterion.All, "no-sloshing-resonance")
	}
}

// addResonance adds the position of a frequency ratio in the band of a resonance.
func addResonance(x *finding.Context, id group.ID, say *finding.Sentence, source *cite.Source) {
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.15, Say: say, Source: source}
	if !x.Has(id) {
		waitOn(x, p, id)
		return
	}
	p.Estimate, p.Inner = finding.Band(x.Get(id), resonanceLow, resonanceHigh, p.Factor)
	x.Add(p)
}
