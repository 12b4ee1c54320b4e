package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// PseudoStatic: of the flow's reaction only the stiffness is kept.
var PseudoStatic = &Entry{
	ID:        "pseudo-static",
	Title:     "Pseudo-static flow",
	LeavesOut: "flow damping and flow inertia: only flow-induced stiffness is kept",
	Estimated: "frequency: flow damping force over flow stiffness force at the wet frequency",
	Measures:  []finding.Measure{finding.Frequency},
	Sources:   []*cite.Source{cite.BisplinghoffAshleyHalfman1955},
	Estimate:  estimatePseudoStatic,
}

var (
	pseudoStatic   = finding.Say("The damping force of the flow is {e:%} of its stiffness force at the wet frequency.")
	onlyFlowDamped = finding.Say("The flow damps this shape and has no stiffness on it: a model that keeps the stiffness alone keeps nothing.")
)

func estimatePseudoStatic(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Any(group.Flow):
		x.NotApplicable(noFlow)
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
	case x.Has(group.FlowStiffness) && x.Get(group.FlowStiffness) == 0:
		x.Add(finding.Part{Measure: finding.Frequency, Basis: finding.Definition, Factor: 1.5, Estimate: 1, Say: onlyFlowDamped, Source: cite.BisplinghoffAshleyHalfman1955})
	default:
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.5, Say: pseudoStatic, Source: cite.BisplinghoffAshleyHalfman1955},
			group.PseudoStatic, identity)
	}
}
