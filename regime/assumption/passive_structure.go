package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// PassiveStructure: the circuit of an active part may be left out. No class
// rests on it: it sets the axis electromechanical.
var PassiveStructure = &Entry{
	ID:        "passive-structure",
	Title:     "Passive structure",
	LeavesOut: "the feedback of the circuit of a piezoelectric part or of a moving coil",
	Estimated: "frequency: √(1 + K²r²/(1 + r²)) − 1, r = ωRC of the load, √(1 + K²) − 1 of an open circuit; response: ζ_e/ζ of the load or the coil",
	Measures:  []finding.Measure{finding.Frequency, finding.Response},
	Sources:   []*cite.Source{cite.HagoodVonFlotow1991, cite.KinslerFrey2000},
	Estimate:  estimatePassive,
}

var (
	passiveNone   = finding.Say("The structure has no piezoelectric part and no moving coil.")
	passiveOpen   = finding.Say("The circuit raises the natural frequency by {e:%}: its coupling is K² = {electromechanical}.")
	passiveDamped = finding.Say("The circuit makes {e:%} of the total damping: ζ_e = {damping_electric}.")
)

func estimatePassive(x *finding.Context) {
	switch {
	case !x.Is(group.Active):
		x.NotApplicable(passiveNone)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	}
	share := 1.0 // of the coupling that the load lets act as stiffness
	if x.Has(group.ElectricLoad) {
		r := x.Get(group.ElectricLoad)
		share = 1 / (1 + 1/(r*r))
	}
	x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.15, Say: passiveOpen, Source: cite.HagoodVonFlotow1991},
		group.Electromechanical, func(k2 float64) float64 { return math.Sqrt(1+k2*share) - 1 })
	p := finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: 1.15, Say: passiveDamped, Source: cite.HagoodVonFlotow1991}
	if !x.Has(group.Electromechanical) {
		p.Source = cite.KinslerFrey2000
	}
	if x.Has(group.DampingElectric) {
		addShare(x, p, x.Get(group.DampingElectric))
		return
	}
	waitOn(x, p, group.DampingElectric)
}
