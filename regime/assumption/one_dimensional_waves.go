package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// OneDimensionalWaves: pressure waves are plane.
var OneDimensionalWaves = &Entry{
	ID:        "one-dimensional-waves",
	Title:     "One-dimensional pressure waves",
	LeavesOut: "cross modes of the column, and inertia of the wall",
	Estimated: "scale: diameter over the length of the pressure wave f D/a of the mode, and of the surge D/(4ℓ_c + 2a t_c), against 0.1",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.WylieStreeter1993, cite.Skalak1956},
	Estimate:  estimateOneDimensionalWaves,
}

var (
	waveLong  = finding.Say("The bore is {wave_diameter} of a pressure wave at the wet frequency; waves are plane below 0.1.")
	surgeLong = finding.Say("The bore is {surge_diameter} of the pressure wave that the closure makes; waves are plane below 0.1.")
	noColumn  = finding.Say("There is no column of fluid in a tube.")
	waveSoft  = finding.Say("The tube carries a pulse wave, whose length has a finding of its own.")
	noWave    = finding.Say("Neither a frequency nor a closure time says how long the pressure waves are; plane waves are those longer than ten bores.")
)

func estimateOneDimensionalWaves(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case x.Is(group.Pulsatile):
		x.NotApplicable(waveSoft)
		return
	case !x.Is(group.Column):
		x.NotApplicable(noColumn)
		return
	case x.Is(group.StaticOnly) && x.State(group.SurgeDiameter) == group.Absent:
		x.NotApplicable(noWave)
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.1, Factor: 1.5, Say: waveLong, Source: cite.WylieStreeter1993}
	if !x.Is(group.StaticOnly) {
		x.AddOrWait(p, group.WaveDiameter, identity)
	}
	p.Say, p.Source = surgeLong, cite.Skalak1956
	x.AddOrWait(p, group.SurgeDiameter, identity)
}
