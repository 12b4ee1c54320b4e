package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// InviscidOscillation: the oscillating boundary layer may be left out.
var InviscidOscillation = &Entry{
	ID:        "inviscid-oscillation",
	Title:     "Inviscid oscillation",
	LeavesOut: "the oscillating boundary layer",
	Estimated: "frequency: |√((1 + μΓr)/(1 + μ)) − 1| with Γ of the viscous solution; response: ζ_v/ζ; sloshing: the damping ratio by the Stokes layers, and in shallow liquid the wave over its breaking height",
	Measures:  []finding.Measure{finding.Frequency, finding.Response, finding.Scale},
	Sources:   []*cite.Source{cite.Stokes1851, cite.Landau1987},
	Estimate:  estimateInviscidOscillation,
}

var (
	inviscidInertia  = finding.Say("Without viscosity the wet frequency is off by {e:%}: the viscous layer makes the added mass {viscous_inertia} times the ideal one at S = {stokes}.")
	inviscidFilm     = finding.Say("Without viscosity the film would escape: its spring, {fluid_stiffness} of the structure's, shifts the frequency by {e:%}.")
	inviscidSloshing = finding.Say("The Stokes layers on walls and bottom lower the sloshing frequency by {e:%}, as much as their damping ratio.")
	inviscidBore     = finding.Say("By linear theory the wave at the wall reaches {e} of the liquid depth: it breaks, and loses what an inviscid liquid keeps.")
	inviscidDamping  = finding.Say("Viscosity makes {e:%} of the total damping: ζ_v = {damping_viscous}.")
)

func estimateInviscidOscillation(x *finding.Context) {
	switch {
	case !oscillates(x):
		return
	case x.Is(group.Sloshing):
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.5, Say: inviscidSloshing, Source: cite.Keulegan1959},
			group.SloshingDamping, identity)
		addBreaking(x)
		return
	}
	if x.Is(group.Pulsatile) {
		addViscousPulse(x)
		return
	}
	p := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Viscous,
		Say: inviscidInertia, Source: cite.Stokes1851}
	addInertia(x, p, group.ViscousInertia)
	if x.Is(group.Film) && x.Has(group.FluidStiffness) {
		p.Say, p.Estimate = inviscidFilm, softened(x.Get(group.FluidStiffness))
		x.Add(p)
	}
	if x.Has(group.DampingViscous) {
		addShare(x, finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: x.Factors.Viscous,
			Say: inviscidDamping, Source: cite.Stokes1851}, x.Get(group.DampingViscous))
	}
}

// breakingDepth is the height of a wave in shallow liquid, over the depth, at
// which it breaks (McCowan, in Dean & Dalrymple 1991, from memory).
const breakingDepth = 0.78

// addBreaking adds what a bore in a shallow tank loses: a wave of linear theory
// that would be higher than its breaking height is no inviscid one.
func addBreaking(x *finding.Context) {
	if !x.Has(group.SloshingAmplitude) || !x.Has(group.FillRatio) || x.Get(group.FillRatio) >= criticalFill {
		return
	}
	height := x.Get(group.SloshingAmplitude) * math.Min(0.1, 0.05/x.Get(group.FillRatio)) // over the depth
	x.Add(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: breakingDepth, Factor: 1.5, Estimate: height,
		Say: inviscidBore, Source: cite.DeanDalrymple1991})
}
