package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// LongWave: the body does not scatter the waves.
var LongWave = &Entry{
	ID:        "long-wave",
	Title:     "Long waves",
	LeavesOut: "diffraction: the waves that the body scatters",
	Estimated: "load: |2/C_M(ka) − 1| of a vertical circular cylinder that diffracts the wave; scale: D/λ of other shapes against 0.2",
	Measures:  []finding.Measure{finding.Load, finding.Scale},
	Sources:   []*cite.Source{cite.MacCamyFuchs1954, cite.DNVC205Waves},
	Estimate:  estimateLongWave,
}

var (
	longCylinder = finding.Say("Without diffraction the inertia force is off by {e:%}: at D/λ = {diffraction} the inertia coefficient is {diffraction_inertia} of that in long waves.")
	longOther    = finding.Say("The body takes {diffraction} of the wavelength; from about 0.2 on it scatters the wave.")
	noWaves      = finding.Say("There are no waves.")
)

// longest is D/λ up to which a body of any shape leaves the wave as it is.
const longest = 0.2

func estimateLongWave(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Is(group.Waves):
		x.NotApplicable(noWaves)
	case x.State(group.DiffractionInertia) != group.Absent && x.State(group.DiffractionInertia) != group.OffRange:
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.15, Say: longCylinder, Source: cite.MacCamyFuchs1954},
			group.DiffractionInertia, func(ratio float64) float64 { return math.Abs(1/ratio - 1) })
		x.Publish(criterion.All, "long-wave")
	default:
		x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: longest, Factor: 2, Say: longOther, Source: cite.DNVC205Waves},
			group.Diffraction, identity)
		x.Publish(criterion.All, "long-wave")
	}
}
