package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// SingleMode: one mode at a time.
var SingleMode = &Entry{
	ID:        "single-mode",
	Title:     "Single mode",
	LeavesOut: "coupling of modes through the fluid, and modes that compete for one wake",
	Estimated: "frequency: μ/(1 + μ)·ω₁²/|ω₂² − ω₁²| times the off-diagonal share of the added mass; scale: position of a second mode in the band of lock-in",
	Measures:  []finding.Measure{finding.Frequency, finding.Scale},
	Sources:   []*cite.Source{cite.Blevins1990, cite.ThisMethod},
	Estimate:  estimateSingleMode,
}

var (
	modesCouple   = finding.Say("The next mode at {next_mode} times the frequency, coupled through {mode_coupling:%} of the added mass, shifts this one by up to {e:%}.")
	noNextMode    = finding.Say("The kind gives no next mode that the fluid could couple to this one.")
	modesCoriolis = finding.Say("The Coriolis force of the flow couples the mode to the next and shifts it by {e:%}.")
	modesUniform  = finding.Say("A uniform section in a uniform fluid couples no modes through the fluid.")
	modesCompete  = finding.Say("A second mode lies at {lock_in_next} of its band of lock-in: more than one mode competes for the wake.")
	modesApart    = finding.Say("A second mode comes to {lock_in_next} of its band of lock-in, and leaves the wake to the first.")
)

func estimateSingleMode(x *finding.Context) {
	if !oscillates(x) {
		return
	}
	p := finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 1.5, Say: modesCouple, Source: cite.Blevins1990}
	switch {
	case x.Is(group.Internal) && x.Has(group.ConveyingMass) && x.Has(group.FlowStiffness):
		// a pinned pipe: ½(2√β u ∫φ₁φ₂′)²/(ω₂² − ω₁²) with ∫φ₁φ₂′ = 8/3, which is 0.096 β (u/π)²
		p.Factor, p.Say, p.Source = 3, modesCoriolis, cite.Paidoussis1998
		p.Estimate = 0.096 * x.Get(group.ConveyingMass) * x.Get(group.FlowStiffness)
		x.Add(p)
	case x.Is(group.Uniform):
		p.Basis, p.Say = finding.Definition, modesUniform
		x.Add(p)
	case x.State(group.NextMode) == group.Absent:
		x.NotApplicable(noNextMode)
		return
	case !x.Has(group.AddedMassRatio):
		waitOn(x, p, group.AddedMassRatio)
	default:
		mu, share := x.Get(group.AddedMassRatio), orZero(x, group.ModeCoupling)
		if share == 1 { // the bound of Cauchy and Schwarz, well above what fluids couple
			p.Factor = 3
		}
		x.AddOrWait(p, group.NextMode, func(ratio float64) float64 {
			return share * mu / (1 + mu) / math.Max(math.Abs(ratio*ratio-1), 1e-9)
		})
	}
	addCompetition(x)
}

// addCompetition adds how near a second mode comes to the wake. The edge of the
// band is known to within a half; which of two modes wins inside it is not known
// short of a solution of both, hence the wider factor there.
func addCompetition(x *finding.Context) {
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 1, Factor: 1.5, Inner: 3, Say: modesCompete, Source: cite.ThisMethod}
	if next := x.Get(group.LockInNext); x.Has(group.LockInNext) && next*p.Factor <= 1 {
		p.Say = modesApart
	}
	x.AddOrWait(p, group.LockInNext, identity)
}
