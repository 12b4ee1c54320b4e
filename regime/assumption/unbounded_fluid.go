package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// UnboundedFluid: walls and neighbours may be left out. No class rests on it;
// it tells which added mass to lump.
var UnboundedFluid = &Entry{
	ID:        "unbounded-fluid",
	Title:     "Unbounded fluid",
	LeavesOut: "walls, shells and neighbours",
	Estimated: "frequency: |√((1 + μ)/(1 + μ_free)) − 1|, confined against free added mass",
	Measures:  []finding.Measure{finding.Frequency},
	Sources:   []*cite.Source{cite.Fritz1972, cite.Batchelor1967},
	Estimate:  estimateUnboundedFluid,
}

var unbounded = finding.Say("Without the walls the wet frequency is off by {e:%}: the confined added mass is {added_mass_ratio} of the dry mass, the free one {added_mass_ratio_free}.")

func estimateUnboundedFluid(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.Confined):
		x.NotApplicable(noWalls)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	}
	p := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Inertia, Say: unbounded, Source: cite.Fritz1972}
	if x.Has(group.AddedMassRatio) && x.Has(group.AddedMassRatioFree) {
		p.Estimate = math.Abs(1 - math.Sqrt((1+x.Get(group.AddedMassRatio))/(1+x.Get(group.AddedMassRatioFree))))
		x.Add(p)
		return
	}
	waitOn(x, p, group.AddedMassRatio, group.AddedMassRatioFree)
}
