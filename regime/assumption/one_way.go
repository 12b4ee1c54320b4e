package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// OneWay: the motion does not act back on the flow.
var OneWay = &Entry{
	ID:        "one-way",
	Title:     "One-way coupling",
	LeavesOut: "feedback of the motion on the flow, beyond added mass and damping lumped at the wet frequency",
	Estimated: "load: static feedback k_flow/(k − k_flow), change of place, velocity feedback 2ωξ/U; frequency: ½ k_flow/k; stability: the worst self-excited hazard",
	Measures:  []finding.Measure{finding.Load, finding.Frequency, finding.Stability},
	Sources:   []*cite.Source{cite.BisplinghoffAshleyHalfman1955, cite.Blevins1990},
	Estimate:  estimateOneWay,
}

var (
	feedbackStatic    = finding.Say("The flow's stiffness, {flow_stiffness} of the structure's, feeds {e:%} of the load back.")
	feedbackFrequency = finding.Say("The mean flow shifts the natural frequency by {e:%}.")
	feedbackSpeed     = finding.Say("The motion's speed, {motion_speed_ratio} of the flow's, changes the load by {e:%}.")
	feedbackHazard    = finding.Say("A self-excited vibration stands at {u} of its onset: the motion makes the flow that drives it.")
	feedbackWaits     = finding.Say("Whether a self-excited vibration arises is not determined.")
)

func estimateOneWay(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case x.Is(group.Sloshing):
		addMovingWalls(x)
		return
	case x.Is(group.Shock) && !x.Any(group.Flow):
		addShockFeedback(x)
		return
	case !x.Any(group.Flow | group.Waves):
		x.NotApplicable(noFlow)
		return
	}
	if x.Is(group.Pulsatile) {
		addPulseBetweenRigidWalls(x)
		addCollapsePart(x)
		return
	}
	addStaticFeedback(x, feedbackStatic)
	addChangeOfPlace(x)
	if !x.Is(group.StaticOnly) {
		if x.Has(group.MotionSpeedRatio) && !x.Is(group.Internal) { // the flow inside is carried along
			x.Add(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Estimate: 2 * x.Get(group.MotionSpeedRatio) * dragShare(x),
				Say: feedbackSpeed, Source: cite.Blevins1990})
		}
		if x.Has(group.FlowStiffness) {
			x.Add(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Flow, Estimate: x.Get(group.FlowStiffness) / 2,
				Say: feedbackFrequency, Source: cite.Blevins1990})
		}
	}
	addHazard(x)
}

// dragShare is the share of the load that goes with the square of the speed: all
// of it but in waves, where the rest is inertia, whose feedback is added mass.
func dragShare(x *finding.Context) float64 {
	if !x.Is(group.Waves) || !x.Has(group.DragInertia) {
		return 1
	}
	r := x.Get(group.DragInertia)
	return r / (1 + r)
}

// addHazard takes the worst self-excited hazard over, with its own factors.
func addHazard(x *finding.Context) {
	if worst, _ := selfExcited(x); worst != nil {
		p := *worst.Main()
		p.Say = feedbackHazard
		x.Add(p)
	}
	if f := waitingHazard(x); f != nil {
		if m := f.Main(); m != nil && m.Waits {
			p := *m
			p.Say = feedbackWaits
			x.Add(p)
		}
	}
}
