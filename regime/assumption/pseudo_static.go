package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// PseudoStatic: of the flow's reaction only the stiffness is kept.
var PseudoStatic = &Entry{
	ID:        "pseudo-static",
	Title:     "Pseudo-static flow",
	LeavesOut: "flow damping and flow inertia: only flow-induced stiffness is kept",
	Estimated: "load: √(1 + r²) − 1 of the flow's reaction, r the flow damping force over the flow stiffness force at the frequency of the motion; the two are a quarter period apart; |C(k) − 1| of a section that lifts or is elongated",
	Measures:  []finding.Measure{finding.Load, finding.Stability},
	Sources:   []*cite.Source{cite.BisplinghoffAshleyHalfman1955},
	Estimate:  estimatePseudoStatic,
}

var (
	pseudoStatic     = finding.Say("The flow's damping force, {pseudo_static} of its stiffness force, changes its reaction by {e:%}.")
	dynamicOnset     = finding.Say("A dynamic instability stands at {e} of its onset: the flow's damping and inertia decide it.")
	laggingStiffness = finding.Say("At k = {reduced_frequency} the flow's memory changes its stiffness force by {e:%}: |C(k) − 1|.")
	noReaction       = finding.Say("The kind has no flow stiffness to keep.")
	onlyFlowDamped   = finding.Say("The flow damps this shape and has no stiffness on it: a model that keeps the stiffness alone keeps nothing.")
)

func estimatePseudoStatic(x *finding.Context) {
	switch {
	case !flows(x, group.Flow): // said why
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
	case x.Is(group.Pulsatile):
		x.NotApplicable(pulseNoStatic)
	case x.State(group.PseudoStatic) == group.Absent && !x.Has(group.FlowStiffness):
		x.NotApplicable(noReaction)
	case x.Has(group.FlowStiffness) && x.Get(group.FlowStiffness) == 0:
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Factor: 1.5, Estimate: 1, Say: onlyFlowDamped, Source: cite.BisplinghoffAshleyHalfman1955})
	default:
		addNearOnset(x, dynamicOnset, NoFlutter, NoGalloping)
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: pseudoStatic, Source: cite.BisplinghoffAshleyHalfman1955},
			group.PseudoStatic, func(r float64) float64 { return math.Hypot(1, r) - 1 })
		pseudoMemory(x)
	}
}

// pseudoMemory adds that the stiffness force of a strip lags behind its motion,
// and is less than the static one: a model that keeps it as static keeps too much.
func pseudoMemory(x *finding.Context) {
	if x.Any(group.Lifting|group.Elongated) && x.Has(group.ReducedFrequency) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: laggingStiffness, Source: cite.Theodorsen1935,
			Estimate: memory(x.Get(group.ReducedFrequency))})
	}
}
