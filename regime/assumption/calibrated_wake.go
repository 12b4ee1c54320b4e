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
	Estimated: "scale: Re outside 300 … 1e7 against the nearer end; turbulence intensity over 0.2; sections that are no circles: at the limit, half the length over the depth for elongated ones",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Facchinetti2004, cite.EN1991Amplitude},
	Estimate:  estimateCalibratedWake,
}

var (
	amongTubes     = finding.Say("No wake oscillator is fitted to wakes among tubes.")
	wakeLow        = finding.Say("Re = {reynolds} against the lower end 300 of the calibration: {e}.")
	wakeHigh       = finding.Say("Re = {reynolds} against the upper end 1e7 of the calibration: {e}. Above 2e5 take the lift and damping coefficients of EN 1991-1-4 E.1.5.")
	wakeOther      = finding.Say("The wake oscillator was fitted to circles: its constants are to be fitted anew to measurements of this section.")
	wakeElongated  = finding.Say("The section is {thickness_ratio} as deep as it is long: from half on the flow comes back to its sides, which no wake oscillator knows.")
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
	case x.Is(group.Array):
		x.NotApplicable(amongTubes)
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: 2, Say: wakeHigh, Source: cite.Facchinetti2004}
	if x.Has(group.Reynolds) && x.Get(group.Reynolds) < 5.5e4 { // the middle of the range, in log Re
		p.Say = wakeLow
	}
	x.AddOrWait(p, group.Reynolds, func(re float64) float64 { return max(300/re, re/1e7) })
	wakeOfSection(x)
	x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.2, Factor: 1.5, Say: wakeTurbulence, Source: cite.EN1991Amplitude},
		group.TurbulenceIntensity, identity)
}

// wakeOfSection adds what a section that is no circle does to the calibration.
func wakeOfSection(x *finding.Context) {
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 1, Factor: 1.5, Say: wakeElongated, Source: cite.Blevins1990}
	switch {
	case x.Is(group.Circular):
	case x.Is(group.Elongated) && x.Has(group.ThicknessRatio):
		p.Estimate = 0.5 / x.Get(group.ThicknessRatio)
		x.Add(p)
	default:
		p.Say, p.Estimate, p.Factor, p.Source = wakeOther, 1, 2, cite.Facchinetti2004
		x.Add(p)
	}
}
