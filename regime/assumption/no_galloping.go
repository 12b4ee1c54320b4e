package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoGalloping: the section does not gallop.
var NoGalloping = &Entry{
	ID:        "no-galloping",
	Title:     "No galloping",
	LeavesOut: "negative flow damping of a section whose lift falls with incidence",
	Estimated: "highest speed of operation over the onset speed 2 Sc f b/a_G; where that lies at 0.7 to 1.5 of the speed at which the vortices meet the mode, over the lesser of the two",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.DenHartog1956, cite.EN1991Galloping},
	Hazard:    "Galloping grows without a limit of its own: the code in force and a wind-tunnel test of the section decide.",
	Estimate:  estimateGalloping,
}

var (
	gallopsEarly   = finding.Say("The onset of galloping lies at {galloping_interaction} of the speed at which the vortices meet the mode, where the two act together: the highest speed of operation is {e} of the lesser.")
	galloping      = finding.Say("The highest speed of operation is {e} of the onset speed of galloping.")
	circleNoGallop = finding.Say("A circle has no transverse force that changes with incidence.")
	neverGallops   = finding.Say("The lift of this section does not fall fast enough with incidence: a_G is not positive.")
	noGallopShape  = finding.Say("The flow does not run across a bluff section.")
)

func estimateGalloping(x *finding.Context) {
	switch {
	case !flows(x, group.Flow): // said why
	case !x.Is(group.Cross | group.Bluff):
		x.NotApplicable(noGallopShape)
	case x.Is(group.Circular):
		x.NotApplicable(circleNoGallop)
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
	case x.State(group.GallopingSpeed) == group.Absent || x.State(group.GallopingSpeed) == group.OffRange:
		x.NotApplicable(neverGallops)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: 1.5,
			Say: galloping, Source: cite.DenHartog1956}, group.GallopingSpeed, identity)
		gallopWithVortices(x)
		x.Publish(criterion.All, "no-galloping")
	}
}

// gallopWithVortices adds the onset where galloping and shedding act together:
// it comes with the earlier of the two, whatever the quasi-steady theory says.
func gallopWithVortices(x *finding.Context) {
	if !x.Has(group.GallopingSpeed) || interaction(x) < 1 {
		return
	}
	x.Add(finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.5, Say: gallopsEarly, Source: cite.EN1991Galloping,
		Estimate: math.Max(x.Get(group.GallopingSpeed), x.Get(group.CriticalSpeedRatio))})
}

// Band of the onset speed of galloping over the critical speed of shedding in
// which the two act together (EN 1991-1-4 E.2.3, from memory).
const interactionLow, interactionHigh = 0.7, 1.5

// interaction is the position of galloping and shedding in that band, below 1
// where they don't act together, and where all speeds of operation lie below
// both, or beyond one and a half times the later of the two, where the wake is
// fast again.
func interaction(x *finding.Context) float64 {
	if !x.Has(group.GallopingInteraction) || !x.Has(group.CriticalSpeedRatio) {
		return 0
	}
	u, _ := finding.Band(x.Get(group.GallopingInteraction), interactionLow, interactionHigh, 1)
	reached := math.Max(orZero(x, group.GallopingSpeed), x.Get(group.CriticalSpeedRatio))
	later := math.Max(1, x.Get(group.GallopingInteraction)) / x.Get(group.CriticalSpeedRatio) * x.Get(group.OperatingHigh)
	left := interactionHigh * later / math.Max(orZero(x, group.OperatingLow), 1e-9)
	return math.Min(u, math.Min(reached, left))
}
