package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoWakeInterference: a neighbour's wake does not shape the flow.
var NoWakeInterference = &Entry{
	ID:        "no-wake-interference",
	Title:     "No interference with the wake of a neighbour",
	LeavesOut: "the wake of a neighbour, or the gap flow between the two",
	Estimated: "1/√((x/3.8)² + (y/2.2)²) with the distances x along and y across the flow in diameters: 3.8/(S/D) in tandem, 2.2/(T/D) side by side; above a reduced velocity of 20 with 10 in place of 3.8, where a wake gallops",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Zdravkovich1987, cite.BokaianGeoola1984},
	Hazard:    "A cylinder in the wake of another can gallop through several diameters and clash: no single-cylinder rule covers it.",
	Estimate:  estimateWakeInterference,
}

var (
	interference   = finding.Say("The neighbour's axis lies {neighbour_along} diameters along and {neighbour_across} across the flow: {e} of the nearness at which the two wakes become one; that is 3.8 in tandem and 2.2 side by side.")
	wakeGalloping  = finding.Say("The neighbour's axis lies {neighbour_along} diameters along and {neighbour_across} across the flow, at a reduced velocity above 20: {e} of the nearness, 10 in tandem, at which a cylinder gallops in a wake.")
	noNeighbour    = finding.Say("No neighbour in the flow was given.")
	neighbourArray = finding.Say("The neighbours are those of the array, whose wakes its own assumptions judge.")
)

// Distances in diameters within which wakes interfere: in tandem the shear
// layers of the first cylinder reach the second one up to 3.8, side by side the
// gap flow is biased up to 2.2; a wake gallops up to about 10 above a reduced
// velocity of 20. Between the two directions an ellipse joins them.
const (
	tandemReach     = 3.8
	sideReach       = 2.2
	gallopingReach  = 10.0
	gallopingFaster = 20.0
)

func estimateWakeInterference(x *finding.Context) {
	switch {
	case !flows(x, group.Flow):
		return
	case x.Is(group.Array):
		x.NotApplicable(neighbourArray)
		return
	case !x.Is(group.Neighboured | group.Cross):
		x.NotApplicable(noNeighbour)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.3, Say: interference, Source: cite.Zdravkovich1987}
	p.Estimate = nearness(x, tandemReach)
	if x.Is(group.StaticOnly) {
		x.Add(p)
		return
	}
	gallop := p
	gallop.Say, gallop.Source, gallop.Estimate = wakeGalloping, cite.BokaianGeoola1984, nearness(x, gallopingReach)
	high := orOne(x, group.OperatingHigh)
	switch {
	case !x.Has(group.ReducedVelocity) && gallop.Estimate*gallop.Factor > 1 && p.Estimate/p.Factor <= 1:
		x.Add(p)
		waitOn(x, gallop, group.ReducedVelocity)
	case x.Has(group.ReducedVelocity) && x.Get(group.ReducedVelocity)*high > gallopingFaster:
		x.Add(gallop)
	default:
		x.Add(p)
	}
}

// nearness is 1 where a neighbour stands at the edge of the region of
// interference and more inside.
func nearness(x *finding.Context, reach float64) float64 {
	return 1 / math.Max(math.Hypot(x.Get(group.NeighbourAlong)/reach, x.Get(group.NeighbourAcross)/sideReach), 1e-6)
}

// orOne is the value of a group, and 1 where it has none.
func orOne(x *finding.Context, id group.ID) float64 {
	if x.Has(id) {
		return x.Get(id)
	}
	return 1
}
