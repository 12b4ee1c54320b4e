package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoAxialCoupling: the pipe does not answer a pressure wave along its axis. No
// class rests on it; it says whether the waves in the wall go into the
// one-dimensional model.
var NoAxialCoupling = &Entry{
	ID:        "no-axial-coupling",
	Title:     "No axial coupling of pipe and column",
	LeavesOut: "stress waves in the wall that a pressure wave drives through Poisson's ratio",
	Estimated: "frequency: ½ κa²/(c_s² − a²) of the wave speed; load: κa²/(c_s² − a²) of the pressure; κ = 4ν² m_f/m_p",
	Measures:  []finding.Measure{finding.Frequency, finding.Load},
	Sources:   []*cite.Source{cite.WiggertTijsseling2001},
	Estimate:  estimateAxialCoupling,
}

var (
	axialSpeed    = finding.Say("Waves in the wall change the speed of the pressure wave by {e:%}: Poisson coupling.")
	axialPressure = finding.Say("Waves in the wall change the pressure of a surge by {e:%}; loose bends and ends change it more.")
	axialHeld     = finding.Say("The pipe is held along its whole length: the wall has no room to move along the axis.")
)

func estimateAxialCoupling(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case x.Is(group.Pulsatile) || !x.Is(group.Column):
		x.NotApplicable(noColumn)
		return
	case x.State(group.AxialCoupling) == group.Absent:
		x.NotApplicable(axialHeld)
		return
	}
	p := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.5, Say: axialSpeed, Source: cite.WiggertTijsseling2001}
	x.AddOrWait(p, group.AxialCoupling, func(v float64) float64 { return v / 2 })
	p.Measure, p.Factor, p.Say = finding.Load, 3, axialPressure
	x.AddOrWait(p, group.AxialCoupling, identity)
}
