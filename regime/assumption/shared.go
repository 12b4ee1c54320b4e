package assumption

import (
	"math"

	"regimed/regime/finding"
	"regimed/regime/group"
)

// Reasons why an effect cannot occur.
var (
	noFluid       = finding.Say("There is no fluid.")
	noFlow        = finding.Say("There is no mean flow.")
	noSurface     = finding.Say("There is no free surface within ten lengths.")
	noWalls       = finding.Say("No wall, shell or neighbour was given.")
	noGap         = finding.Say("There is no narrow gap.")
	noFrequency   = finding.Say("No frequency is given or of interest: a static case.")
	liquidIsDense = finding.Say("The fluid is a liquid: its molecules touch.")
	gasCannot     = finding.Say("The fluid is a gas: it does not cavitate.")
	noMotion      = finding.Say("The structure does not move for lack of a flow or a motion.")
	rigidKind     = finding.Say("The kind has no shape of its own from which slopes and strains follow.")
)

// flows says whether a fluid moves in one of the ways given, and else records
// why the effect cannot occur.
func flows(x *finding.Context, ways group.Traits) bool {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Any(ways):
		x.NotApplicable(noFlow)
	default:
		return true
	}
	return false
}

// oscillates says whether a fluid is shaken, and else records why the effect
// cannot occur.
func oscillates(x *finding.Context) bool {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
	default:
		return true
	}
	return false
}

// identity is the estimate that is the group itself.
func identity(v float64) float64 { return v }

// inertiaError is the error of the wet frequency when the added mass is μ
// instead of μ·Γ: |√((1+μΓ)/(1+μ)) − 1|.
func inertiaError(mu, gamma float64) float64 {
	return math.Abs(math.Sqrt((1+mu*gamma)/(1+mu)) - 1)
}

// addInertia adds what a factor Γ on the added mass does to the wet frequency.
func addInertia(x *finding.Context, p finding.Part, factor group.ID) {
	if !x.Has(group.AddedMassRatio) || !x.Has(factor) {
		waitOn(x, p, factor, group.AddedMassRatio)
		return
	}
	p.Estimate = inertiaError(x.Get(group.AddedMassRatio), x.Get(factor))
	x.Add(p)
}

// orZero is the value of a group, and 0 where it has none.
func orZero(x *finding.Context, id group.ID) float64 {
	if x.Has(id) {
		return x.Get(id)
	}
	return 0
}

// fluidDamping is the sum of the damping ratios that the fluid adds.
func fluidDamping(x *finding.Context) float64 {
	return orZero(x, group.DampingViscous) + orZero(x, group.DampingRadiation) + math.Abs(orZero(x, group.DampingFlow)) + orZero(x, group.DampingTwoPhase)
}

// addShare adds the share of the total damping that is left out with the
// damping ratio left. It waits for the structural damping where that is not
// known.
func addShare(x *finding.Context, p finding.Part, left float64) {
	left = math.Abs(left) // a flow may feed the motion instead of damping it
	others := fluidDamping(x) + orZero(x, group.DampingElectric)
	x.AddOrWait(p, group.DampingRatio, func(structural float64) float64 {
		total := structural + math.Max(others, left)
		if total <= 0 {
			return 0
		}
		return left / total
	})
}

// selfExcitedHazards are the hazards that feed on the motion.
var selfExcitedHazards = []*Entry{NoLockIn, NoGalloping, NoFlutter, NoDivergence, NoBucklingByFlow, NoFluidelasticInstability, NoWakeInterference}

// selfExcited returns the worst finding among the hazards that feed on motion: an
// invalid one before one that a wider factor only makes look worse.
func selfExcited(x *finding.Context) (worst *finding.Finding, e *Entry) {
	for _, h := range selfExcitedHazards {
		f := &x.Made[h.index]
		p := f.Main()
		if p == nil || p.Waits {
			continue
		}
		if worst == nil || f.WorseThan(worst) {
			worst, e = f, h
		}
	}
	return worst, e
}

// waitingHazard returns the first self-excited hazard that waits for an input.
func waitingHazard(x *finding.Context) *finding.Finding {
	for _, h := range selfExcitedHazards {
		if f := &x.Made[h.index]; f.Verdict == finding.Undetermined {
			return f
		}
	}
	return nil
}
