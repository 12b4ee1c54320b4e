package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// CalibratedWake: the wake is one of those that the wake oscillator was fitted to.
var CalibratedWake = &Entry{
	ID:        "calibrated-wake",
	Title:     "Wake within the calibration",
	LeavesOut: "wakes unlike those to which the wake oscillator was fitted",
	Estimated: "scale: Re outside 300 … 1e7 against the nearer end; turbulence intensity over 0.2",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Facchinetti2004, cite.EN1991Amplitude},
	Estimate:  estimateCalibratedWake,
}

var (
	wakeLow        = finding.Say("Re = {reynolds} against the lower end 300 of the calibration: {e}.")
	wakeHigh       = finding.Say("Re = {reynolds} against the upper end 1e7 of the calibration: {e}. Above 2e5 take the lift and damping coefficients of EN 1991-1-4 E.1.5.")
	wakeTurbulence = finding.Say("The turbulence of {turbulence_intensity:%} breaks up the wake from about 20 % on.")
)

func estimateCalibratedWake(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.Cross | group.Bluff):
		x.NotApplicable(notAcross)
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: 2, Say: wakeHigh, Source: cite.Facchinetti2004}
	if x.Has(group.Reynolds) && x.Get(group.Reynolds) < 5.5e4 { // the middle of the range, in log Re
		p.Say = wakeLow
	}
	x.AddOrWait(p, group.Reynolds, func(re float64) float64 { return max(300/re, re/1e7) })
	x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.2, Factor: 1.5, Say: wakeTurbulence, Source: cite.EN1991Amplitude},
		group.TurbulenceIntensity, identity)
}
