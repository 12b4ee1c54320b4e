package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoSurfaceTension: capillarity may be left out.
var NoSurfaceTension = &Entry{
	ID:        "no-surface-tension",
	Title:     "No surface tension",
	LeavesOut: "capillarity of the free surface",
	Estimated: "scale: 1/Bo at rest and in waves, 1/We with mean flow alone, against 0.1",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Batchelor1967},
	Estimate:  estimateSurfaceTension,
}

var (
	capillaryRest = finding.Say("Surface tension is {e} of the weight of the fluid displaced: Bo = {bond}.")
	capillaryFlow = finding.Say("Surface tension is {e} of the momentum of the flow: We = {weber}.")
)

func estimateSurfaceTension(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.NearSurface):
		x.NotApplicable(noSurface)
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.1, Factor: 2, Say: capillaryRest, Source: cite.Batchelor1967}
	inverse := func(v float64) float64 { return 1 / v }
	x.AddOrWait(p, group.Bond, inverse)
	// Waves move the surface by their own weight, however slow the current is: the
	// speed of the current alone would find capillarity in any sea at slack water.
	if x.Any(group.Flow) && !x.Is(group.Waves) && x.Has(group.Weber) {
		p.Say, p.Estimate = capillaryFlow, inverse(x.Get(group.Weber))
		x.Add(p)
	}
}
