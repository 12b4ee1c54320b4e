package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// FluidAbsent: the structure may be modelled dry.
var FluidAbsent = &Entry{
	ID:        "fluid-absent",
	Title:     "No effect of the fluid on the motion",
	LeavesOut: "added mass, fluid stiffness and fluid damping",
	Estimated: "frequency: √(1 + μΓr) − 1, and 1 − 1/√(1 + κ), κ the stiffness of a film or cavity over that of the structure; response: (ζ_v + ζ_rad)/ζ; load: 1 of the liquid in a tank",
	Measures:  []finding.Measure{finding.Frequency, finding.Response, finding.Load},
	Sources:   []*cite.Source{cite.Batchelor1967},
	Estimate:  estimateFluidAbsent,
}

var (
	absentInertia   = finding.Say("Leaving the fluid out shifts the natural frequency by {e:%}: the added mass is {added_mass_ratio} of the dry mass.")
	absentBoth      = finding.Say("Leaving the fluid out shifts the natural frequency by {e:%}: the added mass is {added_mass_ratio} of the dry mass, the fluid's stiffness {fluid_stiffness} of the structure's.")
	absentLiquid    = finding.Say("The load of a tank is that of its liquid: without it there is none.")
	absentSoftest   = finding.Say("Leaving the fluid out shifts the natural frequency of the softest motion by {e:%}: its added mass is {added_mass_ratio_softest} of the dry mass.")
	absentStiffness = finding.Say("Leaving the fluid out shifts the natural frequency by {e:%}: the fluid's stiffness is {fluid_stiffness} of the structure's.")
	absentFilm      = finding.Say("Without the film the free vibration, damped with ζ = {damping_viscous}, is off by {e:%} in frequency; from ζ = 1 on there is none.")
	absentDamping   = finding.Say("The fluid makes {e:%} of the total damping.")
)

func estimateFluidAbsent(x *finding.Context) {
	switch {
	case !oscillates(x):
		return
	case x.Is(group.Pulsatile):
		x.Add(finding.Part{Measure: finding.Frequency, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: pulseIsFluid, Source: cite.WomersleyWave1957})
		return
	}
	if x.Is(group.Sloshing) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: absentLiquid, Source: cite.ThisMethod})
	}
	inertia := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Inertia,
		Say: absentInertia, Source: cite.Batchelor1967}
	if x.Has(group.FrequencyRatio) {
		inertia.Estimate = math.Abs(1/x.Get(group.FrequencyRatio) - 1)
		if x.Has(group.AddedMassRatio) && orZero(x, group.FluidStiffness) > 0 {
			inertia.Say = absentBoth
		}
		x.Add(inertia)
		inertia.Say = absentInertia
	} else {
		x.AddOrWait(inertia, group.AddedMassRatio, func(mu float64) float64 { return math.Sqrt(1+mu) - 1 })
	}
	if x.Has(group.AddedMassSoftest) {
		inertia.Estimate, inertia.Say = math.Sqrt(1+x.Get(group.AddedMassSoftest))-1, absentSoftest
		x.Add(inertia)
	}
	x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Viscous,
		Say: absentStiffness, Source: cite.Batchelor1967}, group.FluidStiffness, softened)
	if x.Is(group.Film) {
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Viscous,
			Say: absentFilm, Source: cite.Langlois1962}, group.DampingViscous, overdamped)
	}
	if x.Has(group.DampingViscous) || x.Has(group.DampingRadiation) {
		addShare(x, finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: x.Factors.Viscous,
			Say: absentDamping, Source: cite.Batchelor1967}, orZero(x, group.DampingViscous)+orZero(x, group.DampingRadiation))
	}
}

// softened is the error of the frequency without a stiffness κ of the fluid
// beside that of the structure, 1 − 1/√(1 + κ), over the frequency with it.
func softened(kappa float64) float64 {
	return 1 - 1/math.Sqrt(1+math.Max(kappa, 0))
}

// overdamped is the error of the frequency of free vibration without a damping
// ratio ζ, 1/√(1 − ζ²) − 1; from ζ = 1 on there is no vibration.
func overdamped(zeta float64) float64 {
	if zeta >= 1 {
		return math.Inf(1)
	}
	return 1/math.Sqrt(1-zeta*zeta) - 1
}
