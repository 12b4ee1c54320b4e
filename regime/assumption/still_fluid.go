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
	Estimated: "frequency: ½ k_flow/k, or U_R against 1 where the kind has no flow stiffness of its own, and 1 − √(1 − ζ_flow²); response: ζ_flow/ζ; load: static deflection over the displacement of interest; in waves 1, or their deflection over the amplitude of interest",
	Measures:  []finding.Measure{finding.Frequency, finding.Response, finding.Load, finding.Stability},
	Sources:   []*cite.Source{cite.Blevins1990, cite.ThisMethod},
	Estimate:  estimateStillFluid,
}

var (
	stillStiffness = finding.Say("The mean flow shifts the natural frequency by {e:%}: its stiffness is {flow_stiffness} of the structure's.")
	stillSpeed     = finding.Say("The flow passes {reduced_velocity} lengths in a period of the mode; below about 1 it hardly changes the motion.")
	stillDamped    = finding.Say("The mean flow damps the mode with ζ = {damping_flow}, which lowers the frequency of free vibration by {e:%}.")
	stillDamping   = finding.Say("The mean flow makes {e:%} of the total damping.")
	stillLoad      = finding.Say("The mean flow deflects the structure by {e:%} of the amplitude of interest.")
	stillFeedback  = finding.Say("The flow's stiffness, {flow_stiffness} of the structure's, changes a load by {e:%}.")
	stillOnset     = finding.Say("An instability stands at {e} of its onset; from half of it on the flow changes the motion.")
	stillArray     = finding.Say("The flow through the array takes {e:%} of the damping of its tubes, the square of V_p/V_c = {fluidelastic_speed}; a tenth is worth a model.")
	stillStatic    = finding.Say("The case is a static one: the load of the mean flow is all that is asked for.")
	stillWaveLoad  = finding.Say("The load of the waves is asked for, and a fluid at rest has none.")
	stillWaves     = finding.Say("The waves deflect the structure by {e:%} of the amplitude of interest.")
	stillThreshold = finding.Say("The mean flow deflects the structure by {static_deflection:%} of the flow length; above 1 % its load is worth a model.")
)

func estimateStillFluid(x *finding.Context) {
	if !flows(x, group.Flow|group.Waves) {
		return
	}
	if x.Is(group.Pulsatile) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: pulseFlows, Source: cite.WomersleyWave1957})
		return
	}
	if x.Is(group.Waves) {
		stillWater(x)
	}
	if !x.Any(group.Flow) {
		return
	}
	if x.Is(group.StaticOnly) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: stillStatic, Source: cite.ThisMethod})
	} else {
		stillFrequency(x)
		if x.Has(group.DampingFlow) {
			x.Add(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Flow,
				Say: stillDamped, Source: cite.Blevins1990, Estimate: slowed(x.Get(group.DampingFlow))})
		}
		if x.Has(group.DampingFlow) {
			addShare(x, finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: x.Factors.Flow,
				Say: stillDamping, Source: cite.Blevins1990}, x.Get(group.DampingFlow))
		}
	}
	addStaticFeedback(x, stillFeedback)
	addFluidelastic(x)
	addNearOnset(x, stillOnset, NoGalloping, NoDivergence, NoFlutter, NoBucklingByFlow)
	load := finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: stillLoad, Source: cite.Blevins1990}
	if !x.Is(group.Amplitude) {
		load.Basis, load.Limit, load.Factor, load.Say, load.Source = finding.Threshold, 1, 2, stillThreshold, cite.ThisMethod
	}
	x.AddOrWait(load, group.StaticDeflectionInterest, identity)
}

// stillWater adds what waves do. Who names waves asks for their load, however
// little it bends the structure, unless an amplitude says what counts.
func stillWater(x *finding.Context) {
	if x.Is(group.StaticOnly) || !x.Is(group.Amplitude) || !x.Has(group.WaveDeflection) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: stillWaveLoad, Source: cite.ThisMethod})
		return
	}
	x.Add(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: stillWaves, Source: cite.Morison1950,
		Estimate: x.Get(group.WaveDeflection)})
}

// slowed is by how much a damping ratio ζ lowers the frequency of free
// vibration, 1 − √(1 − ζ²); from ζ = 1 on there is none.
func slowed(zeta float64) float64 {
	return 1 - math.Sqrt(math.Max(0, 1-zeta*zeta))
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

// noticeableDamping is the share of the damping that the flow through an array
// may take before a fluid at rest is another problem.
const noticeableDamping = 0.1

// addFluidelastic adds the flow's share of the damping in a tube array: the
// fluid stiffness between tubes, which grows as V², cancels all of it at the
// critical speed and (V/V_c)² below.
func addFluidelastic(x *finding.Context) {
	if !x.Is(group.Array) || x.Is(group.StaticOnly) {
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Limit: noticeableDamping, Factor: 1.5, Say: stillArray, Source: cite.Connors1970},
		group.FluidelasticSpeed, func(u float64) float64 { return u * u })
}
