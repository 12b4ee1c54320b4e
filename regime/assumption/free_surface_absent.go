package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// FreeSurfaceAbsent: the surface above may be left out.
var FreeSurfaceAbsent = &Entry{
	ID:        "free-surface-absent",
	Title:     "No free surface",
	LeavesOut: "the free surface above or around",
	Estimated: "frequency: added mass below a rigid lid (ω²d/g < 0.05), below a pressure-free surface (ω²d/g > 10), the worse of the two between; in waves, and for a body that floats, 1; load: the convective share of the mass of the liquid in a tank",
	Measures:  []finding.Measure{finding.Frequency, finding.Load},
	Sources:   []*cite.Source{cite.Newman1977, cite.Batchelor1967},
	Estimate:  estimateFreeSurface,
}

var (
	surfaceLid        = finding.Say("Without the surface, which acts as a rigid lid at ω√(d/g) = {dynamic_froude}, the wet frequency is off by {e:%}.")
	surfaceFree       = finding.Say("Without the surface, which is pressure-free at ω√(d/g) = {dynamic_froude}, the wet frequency is off by {e:%}.")
	surfaceMakesWaves = finding.Say("The waves are those of the surface: without it there is no load.")
	surfaceFloats     = finding.Say("The body pierces the surface: without it there is neither the stiffness of buoyancy nor the waves that a motion makes.")
	surfaceSloshes    = finding.Say("The first sloshing mode moves {convective_mass:%} of the liquid: without the surface all of it would follow the tank.")
	surfaceBoth       = finding.Say("Without the surface, which makes waves at ω√(d/g) = {dynamic_froude}, the wet frequency is off by up to {e:%}.")
)

func estimateFreeSurface(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case x.Is(group.Sloshing):
		surfaceOfTank(x)
		return
	case x.Any(group.Waves | group.Piercing):
		surfaceWaves(x)
		return
	case !x.Is(group.NearSurface):
		x.NotApplicable(noSurface)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	}
	p := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Inertia, Say: surfaceBoth, Source: cite.Newman1977}
	if !x.Has(group.AddedMassRatio) || !x.Has(group.DynamicFroude) || !x.Has(group.SurfaceInertiaLid) || !x.Has(group.SurfaceInertiaFree) {
		waitOn(x, p, group.AddedMassRatio, group.DynamicFroude, group.SurfaceInertiaLid, group.SurfaceInertiaFree)
		return
	}
	mu, waves := x.Get(group.AddedMassRatio), x.Get(group.DynamicFroude)*x.Get(group.DynamicFroude)
	lid, free := inertiaError(mu, x.Get(group.SurfaceInertiaLid)), inertiaError(mu, x.Get(group.SurfaceInertiaFree))
	switch {
	case waves < 0.05:
		p.Estimate, p.Say = lid, surfaceLid
	case waves > 10:
		p.Estimate, p.Say = free, surfaceFree
	default:
		p.Estimate = math.Max(lid, free)
	}
	x.Add(p)
}

// surfaceWaves adds what only a surface makes: waves, and the stiffness of a
// body that floats.
func surfaceWaves(x *finding.Context) {
	p := finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: surfaceMakesWaves, Source: cite.Newman1977}
	if x.Is(group.Waves) {
		x.Add(p)
	}
	if x.Is(group.Piercing) {
		p.Measure, p.Say = finding.Frequency, surfaceFloats
		x.Add(p)
	}
}

func surfaceOfTank(x *finding.Context) {
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.15, Say: surfaceSloshes, Source: cite.Abramson1966},
		group.ConvectiveMass, identity)
	x.Publish(criterion.All, "free-surface-absent")
}
