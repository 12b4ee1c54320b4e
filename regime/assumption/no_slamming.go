package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoSlamming: no crest hits a deck, a roof or, breaking, a wall.
var NoSlamming = &Entry{
	ID:        "no-slamming",
	Title:     "No slamming",
	LeavesOut: "impact of a crest on a deck or a roof, and of a breaking wave on the structure",
	Estimated: "elevation of the crest over the air gap or the freeboard; wave height over breaking height 0.142 λ tanh kd",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Miche1944, cite.WienkeOumeraci2005, cite.Abramson1966},
	Hazard:    "A slamming load is short and high, and the air that is caught shapes it: model tests or a compressible two-phase model come before a design load.",
	Estimate:  estimateSlamming,
}

var (
	slamDeck     = finding.Say("The crest reaches {crest_clearance} of the air gap.")
	slamRoof     = finding.Say("The wave at the wall reaches {crest_clearance} of the freeboard.")
	slamBreaking = finding.Say("The wave stands at {wave_breaking} of its breaking height; a breaking wave slams against what stands in it.")
	noWavesAtAll = finding.Say("There are neither waves nor a liquid that sloshes.")
	noRoof       = finding.Say("No freeboard was given: the liquid has no roof to meet.")
)

func estimateSlamming(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Any(group.Waves | group.Sloshing):
		x.NotApplicable(noWavesAtAll)
		return
	case x.Is(group.Sloshing) && x.State(group.CrestClearance) == group.Absent:
		x.NotApplicable(noRoof)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.3, Say: slamDeck, Source: cite.DNVC205Waves}
	if x.Is(group.Sloshing) {
		p.Say, p.Source = slamRoof, cite.Abramson1966
	}
	x.AddOrWait(p, group.CrestClearance, identity)
	p.Say, p.Source = slamBreaking, cite.Miche1944
	x.AddOrWait(p, group.WaveBreaking, identity)
	x.Publish(criterion.All, "no-slamming")
}
