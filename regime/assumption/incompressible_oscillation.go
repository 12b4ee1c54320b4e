package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// IncompressibleOscillation: sound may be left out.
var IncompressibleOscillation = &Entry{
	ID:        "incompressible-oscillation",
	Title:     "Incompressible oscillation",
	LeavesOut: "sound: compressibility of the oscillating fluid and radiation",
	Estimated: "frequency: |√((1 + μΓr)/(1 + μ)) − 1| with Γ of the acoustic solution, and 1 − 1/√(1 + κ) without the spring of a closed cavity; response: ζ_rad/ζ; sound: 1",
	Measures:  []finding.Measure{finding.Frequency, finding.Response, finding.Sound, finding.Load},
	Sources:   []*cite.Source{cite.JungerFeit1986},
	Estimate:  estimateIncompressibleOscillation,
}

var (
	soundInertia = finding.Say("Without sound the wet frequency is off by {e:%}: at He = {compressibility} the added mass is {acoustic_inertia} times the incompressible one.")
	soundCavity  = finding.Say("An incompressible fluid has no spring in a closed cavity: without it, {fluid_stiffness} of the structure's stiffness, the frequency is off by {e:%}.")
	soundDamping = finding.Say("Radiation makes {e:%} of the total damping: ζ_rad = {damping_radiation}.")
	soundItself  = finding.Say("The radiated sound is asked for, and an incompressible fluid has none.")
)

func estimateIncompressibleOscillation(x *finding.Context) {
	if !x.Is(group.Fluid) {
		x.NotApplicable(noFluid)
		return
	}
	if x.Is(group.Pulsatile) {
		x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.15, Say: pulseCompressed, Source: cite.Korteweg1878},
			group.WallCompliance, func(v float64) float64 { return math.Sqrt(1+1/math.Max(v, 1e-12)) - 1 })
	} else if !x.Is(group.StaticOnly) {
		p := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: x.Factors.Acoustic,
			Say: soundInertia, Source: cite.JungerFeit1986}
		addInertia(x, p, group.AcousticInertia)
		if x.Is(group.Cavity) && !x.Is(group.Film) && x.Has(group.FluidStiffness) {
			p.Say, p.Estimate = soundCavity, softened(x.Get(group.FluidStiffness))
			x.Add(p)
		}
		if x.Has(group.DampingRadiation) {
			addShare(x, finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: x.Factors.Acoustic,
				Say: soundDamping, Source: cite.JungerFeit1986}, x.Get(group.DampingRadiation))
		}
	}
	if x.Is(group.Shock) {
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: shockSound, Source: cite.Cole1948})
	}
	x.Add(finding.Part{Measure: finding.Sound, Basis: finding.Definition, Estimate: 1, Factor: 1,
		Say: soundItself, Source: cite.JungerFeit1986})
}
