package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// RigidStructure: the flow sees an undeformed shape.
var RigidStructure = &Entry{
	ID:        "rigid-structure",
	Title:     "Rigid structure for the flow",
	LeavesOut: "all deformation, for the flow's sake",
	Estimated: "load: change of shape and place: k_flow/(k − k_flow), plus ξ over the shortest length over which the flow that makes the load varies; a cylinder in a wide stream: the tilt, (ξ/ℓ)²",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.BisplinghoffAshleyHalfman1955, cite.ThisMethod},
	Estimate:  estimateRigidStructure,
}

var (
	shapeChange  = finding.Say("The flow's stiffness, {flow_stiffness} of the structure's, changes the load by {e:%}.")
	placeTilt    = finding.Say("The tilt of the deformed structure changes the load by {e:%}.")
	placeWave    = finding.Say("The motion changes the phase of the waves at the body, and so the load, by {e:%}.")
	placeGap     = finding.Say("The deformation takes {e:%} of the gap that shapes the flow.")
	placeUniform = finding.Say("A body that moves as a whole in a wide uniform stream meets the same flow everywhere.")
	placeLength  = finding.Say("The deformation is {e:%} of the length over which the flow varies.")
)

func estimateRigidStructure(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case x.Is(group.Sloshing):
		addMovingWalls(x)
		return
	case !x.Any(group.Flow | group.Waves):
		x.NotApplicable(noFlow)
		return
	}
	if x.Is(group.Pulsatile) {
		addPulseBetweenRigidWalls(x)
		return
	}
	addStaticFeedback(x, shapeChange)
	addChangeOfPlace(x)
}

// addStaticFeedback adds the change of the load by the static deformation,
// κ/(1 − κ) with κ = k_flow/k; at κ ≥ 1 the structure diverges.
func addStaticFeedback(x *finding.Context, say *finding.Sentence) {
	if x.State(group.FlowStiffness) == group.Absent {
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: x.Factors.Flow, Say: say, Source: cite.BisplinghoffAshleyHalfman1955},
		group.FlowStiffness, func(kappa float64) float64 {
			if kappa >= 1 {
				return 1e6
			}
			return kappa / (1 - kappa)
		})
}

// addChangeOfPlace adds the change of the load because the structure is no
// longer where the flow was computed.
func addChangeOfPlace(x *finding.Context) {
	p := finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 2, Source: cite.ThisMethod}
	if x.Is(group.Confined) {
		p.Say = placeGap
		addDeformation(x, p, group.DisplacementGap, group.StaticDeflectionGap, identity)
	}
	if x.Is(group.Waves) {
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: placeWave, Source: cite.Newman1977}, group.DisplacementWave, identity)
		if !x.Any(group.Flow) || x.Is(group.Piercing) {
			return
		}
	}
	switch {
	case x.Is(group.Flexible) && x.Any(group.Cross|group.Axial|group.Internal) && !x.Is(group.PanelLike):
		p.Say = placeTilt
		addDeformation(x, p, group.DisplacementSpan, group.StaticDeflectionSpan, func(v float64) float64 { return v * v })
	case x.Is(group.Piercing) || x.Any(group.Bluff|group.Lifting) && !x.Any(group.Confined|group.NearSurface):
		p.Say, p.Basis = placeUniform, finding.Definition
		x.Add(p)
	default:
		p.Say = placeLength
		addDeformation(x, p, group.Displacement, group.StaticDeflection, identity)
	}
}

// addDeformation adds an estimate at the larger of the amplitude and the
// static deflection; where only one of them is known, that one counts.
func addDeformation(x *finding.Context, p finding.Part, moving, static group.ID, estimate func(float64) float64) {
	a := orZero(x, moving)
	if x.Has(static) {
		p.Estimate = estimate(math.Max(a, x.Get(static)))
		x.Add(p)
		return
	}
	x.AddOrWait(p, moving, estimate)
}
