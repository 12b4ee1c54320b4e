package assumption

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// IncompressibleFlow: the mean flow does not change its density.
var IncompressibleFlow = &Entry{
	ID:        "incompressible-flow",
	Title:     "Incompressible mean flow",
	LeavesOut: "compressibility of the mean flow",
	Estimated: "load: excess of the Prandtl–Glauert factor, 1/√(1 − M²) − 1; in a bore ½M²",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.Glauert1928},
	Estimate:  estimateIncompressibleFlow,
}

var compressibleFlow = finding.Say("At M = {mach} compressibility raises the load by {e:%}.")

func estimateIncompressibleFlow(x *finding.Context) {
	switch {
	case !flows(x, group.Flow): // said why
	case x.Is(group.Internal):
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: compressibleBore, Source: cite.Liepmann1957},
			group.Mach, func(m float64) float64 { return m * m / 2 })
	default:
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: compressibleFlow, Source: cite.Glauert1928},
			group.Mach, glauertExcess)
	}
}

var compressibleBore = finding.Say("At M = {mach} the density along the bore changes by {e:%}: ½M².")

// glauertExcess is the excess of the Prandtl–Glauert factor; where its range
// ends, sound speed is near and nothing incompressible is left.
func glauertExcess(mach float64) float64 {
	e, err := canon.PrandtlGlauert(mach)
	if err != nil {
		return math.Max(1.5, mach)
	}
	return e
}
