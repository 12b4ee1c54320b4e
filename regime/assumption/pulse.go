package assumption

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// What a pulse in a compliant tube makes of the assumptions of every kind.
var (
	pulseIsFluid    = finding.Say("The pulse is in the fluid: a dry model has none.")
	pulseFlows      = finding.Say("The flow pulses: a fluid at rest has no pulse.")
	pulseUnsteady   = finding.Say("The flow pulses: a steady flow leaves the pulse out.")
	pulseTransit    = finding.Say("The pulse needs {pulse_transit} of its period through the segment: between rigid walls it would be in phase everywhere, and the flow is off by {e:%}.")
	pulseWidens     = finding.Say("The pulse widens the bore by {e:%}.")
	pulseNonlinear  = finding.Say("The hoop strain of {wall_strain:%} changes the speed of the pulse wave by {e:%}.")
	pulseMemory     = finding.Say("At α = {womersley} the flow is off a succession of steady flows by {e:%}: its profile remembers.")
	pulseNoStatic   = finding.Say("The flow pulses: it is no load that follows the deflection alone.")
	pulsePeak       = finding.Say("The peak Reynolds number {reynolds_peak} is {e} times the middle of the band of 150 to 250 times α in which a pulsating flow turns turbulent.")
	pulseViscous    = finding.Say("Without viscosity the speed of the pulse wave is off by {e:%} at α = {womersley}.")
	pulseDamped     = finding.Say("Viscosity takes {e:%} of the pulse over a wavelength.")
	pulseCompressed = finding.Say("Without compression of the fluid the speed of the pulse wave is off by {e:%}.")
	pulseCollapsed  = finding.Say("The tube has buckled into lobes: its wall moves by the radius.")
	pulseHoop       = finding.Say("The hoop strain of the pulse is {e} of the strain up to which the material is linear.")
	collapse        = finding.Say("The external pressure stands at {e} of what buckles the tube into lobes.")
	noSqueeze       = finding.Say("No external pressure is given that could press the tube flat.")
)

// addPulseBetweenRigidWalls adds what rigid walls leave out of a pulse.
//
// Between rigid walls the pulse is everywhere in phase; along a tube without
// reflection the flow at the far end is e^{−iωℓ/c} of that at the near end, so
// that the difference is 2 sin(ωℓ/2c), at most 2.
func addPulseBetweenRigidWalls(x *finding.Context) {
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: pulseTransit, Source: cite.WomersleyWave1957},
		group.PulseTransit, func(v float64) float64 { return 2 * math.Sin(math.Pi*math.Min(v, 0.5)) })
	x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 2, Say: pulseWidens, Source: cite.FungCirculation},
		group.WallStrain, func(v float64) float64 { return 2*v + v*v })
}

// pulseProfile is |(1 − F₁₀)/(iα²/8) − 1|, the error of a succession of
// Poiseuille flows for the flow of a pulse: small as α²/6.
func pulseProfile(alpha float64) float64 {
	re, im, err := canon.PulsatileTube(alpha)
	if err != nil {
		return 1
	}
	steady := alpha * alpha / 8
	if steady == 0 {
		return 0
	}
	return math.Hypot(im/steady-1, re/steady)
}

// addPulsePeak adds the peak Reynolds number against its band in pulsating flow.
func addPulsePeak(x *finding.Context) {
	if !x.Has(group.Womersley) {
		return
	}
	alpha := x.Get(group.Womersley)
	const low, high = 150, 250
	x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: math.Sqrt(high / low), Say: pulsePeak, Source: cite.Nerem1972},
		group.ReynoldsPeak, func(re float64) float64 { return re / (alpha * math.Sqrt(low*high)) })
}

// addViscousPulse adds what viscosity does to a pulse: it slows and damps it.
func addViscousPulse(x *finding.Context) {
	p := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.15, Say: pulseViscous, Source: cite.WomersleyWave1957}
	if !x.Has(group.PulseSpeed) {
		waitOn(x, p, group.PulseSpeed)
		return
	}
	p.Estimate = 1/math.Max(x.Get(group.PulseSpeed), 1e-6) - 1
	x.Add(p)
	p.Measure, p.Say, p.Estimate = finding.Response, pulseDamped, 1-x.Get(group.PulseDecay)
	x.Add(p)
}
