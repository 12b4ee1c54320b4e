package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// SteadyFlow: the flow has no unsteadiness of its own.
var SteadyFlow = &Entry{
	ID:        "steady-flow",
	Title:     "Steady flow",
	LeavesOut: "unsteadiness of the flow of its own: shedding, turbulence",
	Estimated: "load: √(1 + (C_L′ DAF/C_D)²) − 1 of the resultant of a bluff body above Re 47, DAF = min(1/|1 − (f_v/f_w)²|, 1/(2ζ)); twice the turbulence intensity",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.Blevins1990, cite.SumerFredsoe2006},
	Estimate:  estimateSteadyFlow,
}

var (
	sheddingLoad   = finding.Say("Shedding raises the resultant load by {e:%}: C_L′ = {lift_fluctuation} against C_D = {drag_coefficient}.")
	sheddingNear   = finding.Say("Shedding at {shedding_ratio} of the wet frequency raises the resultant load by {e:%}.")
	bodyWake       = finding.Say("All of the load on a structure in the wake of a body that sheds is unsteady.")
	bodySteady     = finding.Say("The wake of the leading body is steady: Re = {body_reynolds} on its diameter is below 47.")
	turbulenceLoad = finding.Say("Turbulence of {turbulence_intensity:%} changes the load by {e:%}.")
	steadyByRe     = finding.Say("At Re = {reynolds} the wake is steady: no vortices are shed below 47.")
	wavesComeAndGo = finding.Say("Waves come and go: no flow in them is steady.")
	steadyShape    = finding.Say("The flow along this shape is steady by itself, and no turbulence was given.")
)

func estimateSteadyFlow(x *finding.Context) {
	if !flows(x, group.Flow|group.Waves) {
		return
	}
	if x.Is(group.Waves) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: wavesComeAndGo, Source: cite.ThisMethod})
		return
	}
	if x.Is(group.WakeOfBody) {
		wakePart(x)
		return
	}
	if x.Is(group.Pulsatile) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: pulseUnsteady, Source: cite.WomersleyWave1957})
		return
	}
	if x.Is(group.Bluff | group.Cross) {
		sheddingPart(x)
	} else if !x.Has(group.TurbulenceIntensity) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 0, Factor: 1.5, Say: steadyShape, Source: cite.Blevins1990})
	}
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 1.5, Say: turbulenceLoad, Source: cite.Blevins1990},
		group.TurbulenceIntensity, func(v float64) float64 { return 2 * v })
}

func sheddingPart(x *finding.Context) {
	p := finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 2, Say: sheddingNear, Source: cite.Blevins1990}
	switch {
	case x.Has(group.Strouhal) && x.Get(group.Strouhal) == 0:
		p.Estimate, p.Say, p.Basis = 0, steadyByRe, finding.Definition
		x.Add(p)
	case !x.Has(group.LiftFluctuation) || !x.Has(group.DragCoefficient):
		waitOn(x, p, group.DragCoefficient, group.LiftFluctuation, group.Reynolds)
	case x.Is(group.StaticOnly):
		p.Say = sheddingLoad
		p.Estimate = resultantExcess(x, 1)
		x.Add(p)
	default:
		x.AddOrWait(p, group.SheddingRatio, func(r float64) float64 { return resultantExcess(x, amplification(x, r)) })
	}
}

func resultantExcess(x *finding.Context, amplification float64) float64 {
	lift := x.Get(group.LiftFluctuation) * amplification / x.Get(group.DragCoefficient)
	return math.Sqrt(1+lift*lift) - 1
}

// amplification is the dynamic factor of a mode that is forced at r times its
// frequency; an unknown damping is taken as none.
func amplification(x *finding.Context, r float64) float64 {
	daf := 1 / math.Max(math.Abs(1-r*r), 1e-9)
	if zeta := orZero(x, group.DampingTotal); zeta > 0 {
		daf = math.Min(daf, 1/(2*zeta))
	}
	return daf
}

// wakePart is the unsteadiness of the wake of a leading body.
func wakePart(x *finding.Context) {
	p := finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: bodyWake, Source: cite.TurekHron2006}
	if !x.Has(group.BodyReynolds) {
		waitOn(x, p, group.BodyReynolds)
		return
	}
	if x.Get(group.Strouhal) == 0 {
		p.Estimate, p.Say = 0, bodySteady
	}
	x.Add(p)
}
