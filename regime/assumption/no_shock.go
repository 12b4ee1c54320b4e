package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoShock: no shock wave strong enough to tear the liquid off the structure.
var NoShock = &Entry{
	ID:        "no-shock",
	Title:     "No shock wave",
	LeavesOut: "a shock wave that the structure reflects, and the cavity that it leaves at its face",
	Estimated: "largest tension at the face of a plate that runs away from the shock, over what parts the liquid from its vapour pressure",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Taylor1941, cite.Cole1948},
	Hazard:    "A shock wave loads by its impulse, and a second time when the cavity at the face closes and the bubble of an explosion pulses: a code for shock response, and tests, decide.",
	Estimate:  estimateShock,
}

var (
	shockTears  = finding.Say("The plate runs away from the shock at ψ = {taylor_parameter}, and the tension at its face reaches {shock_tension} of what parts the liquid from its vapour pressure.")
	shockCavity = finding.Say("The reflected shock pulls at the face of the plate with {shock_tension} of what parts the liquid from its vapour pressure.")
	shockMoves  = finding.Say("The plate takes {shock_impulse:%} of the impulse that a rigid wall would: a load computed without its motion is off by {e:%}.")
	shockSound  = finding.Say("A shock is a wave of sound: an incompressible fluid has none.")
	noShockWave = finding.Say("No shock wave was given.")
	shockInGas  = finding.Say("The fluid is a gas: it follows the plate.")
)

func estimateShock(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Is(group.Shock):
		x.NotApplicable(noShockWave)
	case x.Is(group.Gas):
		x.NotApplicable(shockInGas)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: 1.5, Say: shockTears, Source: cite.Taylor1941},
			group.ShockTension, identity)
	}
}

// addShockFeedback adds the relief of the load by the plate's own motion: a model
// that takes the shock as on a rigid wall is off by 1/f − 1, f the share of the
// impulse that is taken.
func addShockFeedback(x *finding.Context) {
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.15, Say: shockMoves, Source: cite.Taylor1941},
		group.ShockImpulse, func(f float64) float64 { return math.Min(1/f-1, 1e6) })
}
