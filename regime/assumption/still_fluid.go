package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// StillFluid: the mean flow may be left out.
var StillFluid = &Entry{
	ID:        "still-fluid",
	Title:     "Fluid at rest",
	LeavesOut: "the mean flow's effect on the motion, and its load",
	Estimated: "frequency: ½ k_flow/k, or U_R against 1 where the kind has no flow stiffness of its own; response: ζ_flow/ζ; load: static deflection over the displacement of interest",
	Measures:  []finding.Measure{finding.Frequency, finding.Response, finding.Load, finding.Stability},
	Sources:   []*cite.Source{cite.Blevins1990, cite.ThisMethod},
	Estimate:  estimateStillFluid,
}

var (
	stillStiffness = finding.Say("The mean flow shifts the natural frequency by {e:%}: its stiffness is {flow_stiffness} of the structure's.")
	stillSpeed     = finding.Say("The flow passes {reduced_velocity} lengths in a period of the mode; below about 1 it hardly changes the motion.")
	stillDamping   = finding.Say("The mean flow makes {e:%} of the total damping.")
	stillLoad      = finding.Say("The mean flow deflects the structure by {e:%} of the amplitude of interest.")
	stillFeedback  = finding.Say("The flow's stiffness, {flow_stiffness} of the structure's, changes a load by {e:%}.")
	stillOnset     = finding.Say("An instability stands at {e} of its onset; from half of it on the flow changes the motion.")
	stillStatic    = finding.Say("The case is a static one: the load of the mean flow is all that is asked for.")
	stillThreshold = finding.Say("The mean flow deflects the structure by {static_deflection:%} of the flow length; above 1 % its load is worth a model.")
)

func estimateStillFluid(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Any(group.Flow):
		x.NotApplicable(noFlow)
		return
	}
	if x.Is(group.StaticOnly) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: stillStatic, Source: cite.ThisMethod})
	} else {
		stillFrequency(x)
		if x.Has(group.DampingFlow) {
			addShare(x, finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: x.Factors.Flow,
				Say: stillDamping, Source: cite.Blevins1990}, x.Get(group.DampingFlow))
		}
	}
	addStaticFeedback(x, stillFeedback)
	addNearOnset(x, stillOnset, NoGalloping, NoDivergence, NoFlutter, NoBucklingByFlow)
	load := finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: stillLoad, Source: cite.Blevins1990}
	if !x.Is(group.Amplitude) {
		load.Basis, load.Limit, load.Factor, load.Say, load.Source = finding.Threshold, 1, 2, stillThreshold, cite.ThisMethod
	}
	x.AddOrWait(load, group.StaticDeflectionInterest, identity)
}

func stillFrequency(x *finding.Context) {
	if x.State(group.FlowStiffness) != group.Absent {
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Flow,
			Say: stillStiffness, Source: cite.Blevins1990}, group.FlowStiffness, func(v float64) float64 { return v / 2 })
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Threshold, Limit: 1, Factor: 2,
		Say: stillSpeed, Source: cite.Blevins1990}, group.ReducedVelocity, identity)
}

// addNearOnset adds the worst of some instabilities: the flow's share of the
// damping is u, that of the stiffness u², so that from half the onset on a
// model without them is another problem.
func addNearOnset(x *finding.Context, say *finding.Sentence, hazards ...*Entry) {
	worst := 0.0
	for _, h := range hazards {
		if u, ok := x.Made[h.index].Utilisation(); ok {
			worst = math.Max(worst, u)
		}
	}
	if worst > 0 && !x.Is(group.StaticOnly) {
		x.Add(finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Limit: 0.5, Factor: 1.5, Estimate: worst, Say: say, Source: cite.ThisMethod})
	}
}
