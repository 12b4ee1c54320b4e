package kind

import (
	"math"

	"regimed/regime/group"
	"regimed/regime/scale"
	"regimed/units"
)

// A plane shock wave that meets a plate.
var (
	ShockPressure = quantity("shock_pressure", units.PressureDifference, "gt=0", "peak of an exponential shock wave in the fluid, above the static pressure, that meets a plate head on", "no shock")
	ShockDecay    = quantity("shock_decay_time", units.Time, "gt=0", "time in which the shock falls to 1/e", "")
)

// shock takes a shock wave; sides are the wetted sides of the plate, 0 of what is
// no plate.
func (r *Resolver) shock(sides float64) {
	if !r.c.Has(ShockPressure) && !r.c.Has(ShockDecay) {
		return
	}
	if sides != 1 {
		r.contradict(ShockPressure, "A shock is solved for a plate that is wet on one side: wetted_sides 1.")
		return
	}
	if !r.Is(group.Fluid) {
		r.contradict(ShockPressure, "A shock needs a fluid.")
		return
	}
	r.trait(group.Shock)
	r.takeOrNeed(scale.ShockPressure, ShockPressure)
	r.takeOrNeed(scale.ShockDecay, ShockDecay)
}

// shockImpulse is the share of the impulse 2Pθ of the reflected shock that a plate
// takes, and the largest tension at its face over P: the plate runs away from the
// water.
//
//	impulse ψ^(ψ/(1 − ψ)); tension (2/ψ) ψ^(−2/(ψ − 1)); ψ = ρcθ/(ρ_s h)
//
// Symbols: ψ Taylor's parameter, θ decay time [s], ρc of the fluid, ρ_s h mass per area.
// Range: ψ > 0, an exponential plane wave on a free plate, gas behind; ψ = 1: 1/e and
// 2/e². Accuracy: exact for an acoustic wave. Check: ψ 5.343: 0.1272; the plate reaches
// 8.89 m/s under 10.06 MPa, 0.546 ms and 157 kg/m².
// Source: Taylor 1941; Cole 1948, ch. 10, from memory.
func shockImpulse(psi float64) (impulse, tension float64) {
	if math.Abs(psi-1) < 1e-6 {
		return math.Exp(-1), 2 * math.Exp(-2)
	}
	log := math.Log(psi) / (psi - 1)
	return math.Exp(-psi * log), 2 / psi * math.Exp(-2*log)
}

// shockGroups puts what a shock makes of a plate.
func shockGroups(s *scale.Set, g *group.Set) {
	if !g.Is(group.Shock) {
		return
	}
	needs := []scale.ID{scale.ShockDecay, scale.Density, scale.SoundSpeed, scale.DryMass}
	psi := s.X(scale.Density) * s.X(scale.SoundSpeed) * s.X(scale.ShockDecay) / s.X(scale.DryMass)
	putOrWait(s, g, group.Taylor, psi, needs...)
	impulse, tension := shockImpulse(psi)
	putOrWait(s, g, group.ShockImpulse, impulse, needs...)
	putOrWait(s, g, group.ShockPeriod, s.X(scale.ShockDecay)*s.X(scale.FrequencyWet), scale.ShockDecay, scale.FrequencyWet)
	if g.Is(group.Gas) {
		return
	}
	holds := math.Max(s.X(scale.Pressure)-s.X(scale.VapourPressure), 1e-12*s.X(scale.Pressure))
	putOrWait(s, g, group.ShockTension, tension*s.X(scale.ShockPressure)/holds, append(needs, scale.ShockPressure, scale.Pressure, scale.VapourPressure)...)
}
