package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// SmallDisplacement: the structure moves linearly.
var SmallDisplacement = &Entry{
	ID:        "small-displacement",
	Title:     "Small displacement",
	LeavesOut: "geometric stiffening and large rotation",
	Estimated: "frequency: √(1 + κ(ξ/h)²) − 1 of ends or edges that can't move, the square of the slope of cantilevers and of ends that can; at the amplitude of the limit cycle where a self-excited hazard is active",
	Measures:  []finding.Measure{finding.Frequency},
	Sources:   []*cite.Source{cite.WoinowskyKrieger1950, cite.ChuHerrmann1956},
	Estimate:  estimateSmallDisplacement,
}

var (
	stretching = finding.Say("At {displacement_thickness} thicknesses (or radii of gyration) the stretching of the held ends or edges shifts the frequency by {e:%}.")
	rotation   = finding.Say("The slope of {slope} shifts the frequency by about {e:%}.")
)

func estimateSmallDisplacement(x *finding.Context) {
	if x.Is(group.StaticOnly) && !x.Has(group.Displacement) {
		x.NotApplicable(noFrequency)
		return
	}
	switch {
	case !x.Is(group.Flexible) && x.State(group.Slope) == group.Absent:
		x.NotApplicable(rigidKind)
	case x.Is(group.Pulsatile): // a wall of constant modulus: c² = (A/ρ) dp/dA grows as R
		if x.Has(group.CollapsePressure) && x.Get(group.CollapsePressure) > 1 {
			x.Add(finding.Part{Measure: finding.Frequency, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: pulseCollapsed, Source: cite.Shapiro1977})
		}
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 2, Say: pulseNonlinear, Source: cite.FungCirculation},
			group.WallStrain, func(v float64) float64 { return math.Sqrt(1+v) - 1 })
	case x.Is(group.Restrained):
		stiffening := x.Stiffening
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.5, Say: stretching, Source: cite.ChuHerrmann1956},
			group.DisplacementThickness, func(w float64) float64 { return math.Sqrt(1+stiffening*w*w) - 1 })
	default:
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Threshold, Factor: 2, Say: rotation, Source: cite.WoinowskyKrieger1950},
			group.Slope, func(s float64) float64 { return s * s })
	}
}
