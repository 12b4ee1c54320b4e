package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// LinearCompressible: no shocks that matter.
var LinearCompressible = &Entry{
	ID:        "linear-compressible",
	Title:     "Linear compressible flow",
	LeavesOut: "shocks: transonic and hypersonic nonlinearity",
	Estimated: "scale: position of M in the transonic band 0.75 … 1.25; above it M τ against 1, τ the relative thickness",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.BisplinghoffAshleyHalfman1955, cite.ThisMethod},
	Estimate:  estimateLinearCompressible,
}

var (
	transonic  = finding.Say("M = {mach} lies at {e} of the transonic band from 0.75 to 1.25.")
	hypersonic = finding.Say("M times the relative thickness is {e}; towards 1 the flow is hypersonic.")
)

// Transonic band: a thin section of 5 to 10 % has its critical Mach number
// near 0.75 to 0.8, and its bow shock attaches near 1.25.
const transonicLow, transonicHigh = 0.75, 1.25

func estimateLinearCompressible(x *finding.Context) {
	if !flows(x, group.Flow) {
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: 1.1, Say: transonic, Source: cite.BisplinghoffAshleyHalfman1955}
	if !x.Has(group.Mach) {
		x.Wait(p, group.Mach, func(m float64) float64 { return m / transonicLow })
		return
	}
	mach := x.Get(group.Mach)
	p.Estimate, p.Inner = finding.Band(mach, transonicLow, transonicHigh, p.Factor)
	x.Add(p)
	if mach > transonicHigh && x.Has(group.ThicknessRatio) {
		p.Say, p.Estimate, p.Inner = hypersonic, mach*x.Get(group.ThicknessRatio), 0
		x.Add(p)
	}
}
