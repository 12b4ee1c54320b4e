package assumption

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// QuasiSteady: the flow sees a structure that stands still.
var QuasiSteady = &Entry{
	ID:        "quasi-steady",
	Title:     "Quasi-steady flow",
	LeavesOut: "memory of the flow",
	Estimated: "load: |C(k) − 1| of attached flow and of sections more than twice as long as deep, for the mode and for torsion; other bluff bodies: f_w/f_v against 1/3 (with St 0.2 a reduced velocity above 15); scale: onset of galloping at 0.7 to 1.5 of the critical speed of shedding",
	Measures:  []finding.Measure{finding.Load, finding.Scale},
	Sources:   []*cite.Source{cite.Theodorsen1935, cite.Blevins1990},
	Estimate:  estimateQuasiSteady,
}

var (
	memoryPanel   = finding.Say("At k = {reduced_frequency} the inertia and damping of the flow over the bent panel change the load by {e:%}.")
	memoryLift    = finding.Say("At k = {reduced_frequency} the flow's memory changes the load by {e:%}: |C(k) − 1|.")
	memoryTwist   = finding.Say("In torsion, at k = {reduced_frequency_torsion}, the flow's memory changes the load by {e:%}: |C(k) − 1|.")
	memoryBoth    = finding.Say("The onset of galloping lies at {galloping_interaction} of the speed at which the vortices meet the mode; from 0.7 to 1.5 no quasi-steady theory holds.")
	memoryWake    = finding.Say("The mode beats {e} times as fast as the wake sheds; memory fades below a third.")
	memoryNone    = finding.Say("The flow along a slender body has no memory: its load follows the motion of the section.")
	memoryTransit = finding.Say("The flow needs {transit_ratio} of a period of the mode to pass the tube.")
	memoryAlong   = finding.Say("The flow does not run across the bluff body: there is no street of vortices that remembers.")
	noWake        = finding.Say("No vortices are shed at Re = {reynolds}: memory has no time scale of a wake.")
)

func estimateQuasiSteady(x *finding.Context) {
	switch {
	case !flows(x, group.Flow): // said why
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
	case x.Is(group.Axial) && !x.Is(group.PanelLike): // a narrow flag is bent as a wide one is
		x.NotApplicable(memoryNone)
	case x.Is(group.Bluff) && !x.Is(group.Cross):
		x.NotApplicable(memoryAlong)
	case x.Is(group.PanelLike):
		panelMemory(x)
	case x.Is(group.Pulsatile):
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.15, Say: pulseMemory, Source: cite.Womersley1955},
			group.Womersley, pulseProfile)
	case x.Is(group.Internal):
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 2, Say: memoryTransit, Source: cite.Paidoussis1998},
			group.TransitRatio, identity)
	case !x.Is(group.Bluff), x.Is(group.Elongated):
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: memoryLift, Source: cite.Theodorsen1935},
			group.ReducedFrequency, memory)
		if x.Has(group.ReducedFrequencyTorsion) {
			x.Add(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: memoryTwist, Source: cite.Theodorsen1935,
				Estimate: memory(x.Get(group.ReducedFrequencyTorsion))})
		}
		memoryOfWake(x)
	case x.Has(group.Strouhal) && x.Get(group.Strouhal) == 0:
		x.NotApplicable(noWake)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 1.0 / 3, Factor: 1.5, Say: memoryWake, Source: cite.Blevins1990},
			group.SheddingRatio, func(r float64) float64 { return 1 / r })
		memoryOfWake(x)
	}
}

// memoryOfWake adds that galloping and shedding act together, where they do.
func memoryOfWake(x *finding.Context) {
	if u := interaction(x); u > 0 {
		x.Add(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 1, Factor: 1.15, Inner: 1.05, Estimate: u, Say: memoryBoth, Source: cite.EN1991Galloping})
	}
}

// panelMemory is what a panel's flow remembers: below Mach 1 the potential flow
// over a wave of wave number k answers to (1 + κ)², κ = ω/(Uk), of which the
// quasi-steady flow keeps the 1, and so does that along a slender body, whose load
// is the virtual mass times (∂/∂t + U ∂/∂x)²; above it, piston theory is quasi-steady to
// the order κ/(M² − 1).
func panelMemory(x *finding.Context) {
	p := finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: memoryPanel, Source: cite.Dowell1975}
	mach := x.Get(group.Mach)
	x.AddOrWait(p, group.ReducedFrequency, func(k float64) float64 {
		if mach > 1 {
			return k / math.Max(mach*mach-1, 1e-6)
		}
		return 2*k + k*k
	})
}

// memory is |C(k) − 1| of Theodorsen's function; ½ is its limit beyond the
// range of the function.
func memory(k float64) float64 {
	re, im, err := canon.Theodorsen(k)
	if err != nil {
		if k < 1 {
			return 0
		}
		return 0.5
	}
	return math.Hypot(re-1, im)
}
