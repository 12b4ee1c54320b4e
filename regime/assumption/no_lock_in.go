package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoLockIn: vortex shedding does not lock to a mode.
var NoLockIn = &Entry{
	ID:        "no-lock-in",
	Title:     "No lock-in of vortex shedding",
	LeavesOut: "the feedback by which a vibrating body holds the shedding at its own frequency",
	Estimated: "across the flow: the lesser of the position of St U/(f_w D) in the unstable band of the linear wake oscillator, extended to the end of measured lock-in, and (A/D)/0.02 of the published amplitudes, at the worst speed of operation and for the worst mode; along the flow, in liquids: the lesser of the position of U/(f_w D) in 1 … 4.5 and 1.8/Sc",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.DeLangre2006, cite.GovardhanWilliamson2000, cite.SkopGriffin1975, cite.GovardhanWilliamson2006, cite.DNVC205},
	Hazard:    "Vortex-induced vibration can fatigue a structure within hours: the code in force for it, and its fatigue check, decide.",
	Estimate:  estimateLockIn,
}

var (
	lockInBand        = finding.Say("Shedding meets a mode: St U/(f_w D) comes to {lock_in_position} in operation, the band of lock-in runs from {wake_band_low} to {lock_in_end}; locked in, the amplitude reaches {vortex_amplitude} D.")
	lockInBandOpen    = finding.Say("Shedding meets a mode: St U/(f_w D) comes to {lock_in_position} in operation, the band of lock-in begins at {wake_band_low} and has no upper end; locked in, the amplitude reaches {vortex_amplitude} D.")
	lockInOff         = finding.Say("Shedding keeps off the modes: St U/(f_w D) comes to {lock_in_position} at the most unfavourable speed of operation, the band of lock-in begins at {wake_band_low}.")
	lockInAmplitude   = finding.Say("Locked in, the amplitude would be {vortex_amplitude} D, against 0.02 D below which lock-in is a forced vibration.")
	lockInNoDamping   = finding.Say("St U/(f_w D) comes to {lock_in_position} in operation, in the band from {wake_band_low} on; whether the vibration grows depends on the damping, which was not given.")
	lockInInline      = finding.Say("Along the flow: U/(f_w D) comes to {inline_velocity} in operation, the in-line band runs from 1 to 4.5; 1.8/Sc is {inline_scruton}.")
	lockInBehind      = finding.Say("The leading body sheds at {shedding_ratio} of the wet frequency of the first mode; St U/(f_w D) comes to {lock_in_position} of mode {lock_in_mode} in operation, the band of lock-in runs from {wake_band_low} to {lock_in_end}.")
	noSheddingBody    = finding.Say("The leading body sheds no vortices: Re = {body_reynolds} on its diameter is below 47.")
	noStreetInBubbles = finding.Say("With {void_fraction:%} of gas in the mixture no regular street of vortices forms among the tubes; up to 15 % one may.")
	noShedding        = finding.Say("No vortices are shed: Re = {reynolds} is below 47.")
	notAcross         = finding.Say("The flow does not run across the structure.")
	attached          = finding.Say("The body is streamlined without a blunt trailing edge: it sheds no street of vortices.")
)

// Void fraction above which no periodic shedding is found in tube arrays
// (Pettigrew & Taylor 2003, from memory).
const noStreetAbove = 0.15

// Amplitude below which lock-in is a forced vibration, over the diameter.
const forcedAmplitude = 0.02

func estimateLockIn(x *finding.Context) {
	switch {
	case !flows(x, group.Flow):
		return
	case x.Is(group.WakeOfBody):
	case !x.Is(group.Cross):
		x.NotApplicable(notAcross)
		return
	case !x.Any(group.Bluff | group.BluntEdge):
		x.NotApplicable(attached)
		return
	case x.Has(group.VoidFraction) && x.Get(group.VoidFraction) > noStreetAbove:
		x.NotApplicable(noStreetInBubbles)
		return
	}
	switch {
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	case x.Has(group.Strouhal) && x.Get(group.Strouhal) == 0:
		if x.Is(group.WakeOfBody) {
			x.NotApplicable(noSheddingBody)
			return
		}
		x.NotApplicable(noShedding)
		return
	}
	lockInAcross(x)
	if x.Is(group.Liquid) {
		lockInAlong(x)
	}
	x.Publish(criterion.All, "no-lock-in")
}

func lockInAcross(x *finding.Context) {
	band := finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Limit: 1, Factor: 1.15,
		Say: lockInBand, Source: cite.DeLangre2006}
	if !x.Has(group.LockInPosition) {
		waitOn(x, band, group.LockInPosition, group.WakeBandLow)
		return
	}
	if x.Is(group.Array) { // no oscillator is calibrated for a wake among tubes
		band.Source, band.Factor = cite.ASMEN1324, 1.5
	}
	position := x.Get(group.LockInPosition)
	lo, hi := x.Get(group.WakeBandLow), math.Inf(1)
	if x.Has(group.LockInEnd) {
		hi = x.Get(group.LockInEnd)
	} else {
		band.Say = lockInBandOpen
	}
	band.Estimate, band.Inner = finding.Band(position, lo, hi, band.Factor)
	if x.Has(group.WakeBandHigh) { // the linear band is narrower, and the vibration strongest inside it
		if u, inner := finding.Band(position, lo, x.Get(group.WakeBandHigh), band.Factor); u/inner > band.Estimate/band.Inner {
			band.Estimate, band.Inner = u, inner
		}
	}
	if position > hi && !x.Is(group.ModesDerived) && band.Estimate < 1 {
		band.Estimate = 1 // higher modes, which are not known, lie ahead
	}
	amplitude := finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Limit: 1, Factor: 2,
		Say: lockInAmplitude, Source: cite.SkopGriffin1975}
	if x.Is(group.Array) {
		amplitude.Source = cite.PettigrewTaylor2003
	}
	switch {
	case x.Is(group.WakeOfBody):
		band.Say, band.Source = lockInBehind, cite.TurekHron2006
		x.Add(band)
	case band.Estimate*band.Factor <= 1:
		band.Say = lockInOff
		x.Add(band) // the speeds stay off the band: the damping does not matter
	case x.Has(group.VortexAmplitude):
		amplitude.Estimate = x.Get(group.VortexAmplitude) / forcedAmplitude
		x.Add(lesser(band, amplitude))
	default:
		amplitude.Say = lockInNoDamping
		waitOn(x, amplitude, group.VortexAmplitude, group.DampingRatio)
	}
}

func lockInAlong(x *finding.Context) {
	if !x.Has(group.InlinePosition) {
		return // waits for the same input as the band across
	}
	part := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Limit: 1, Factor: 1.15,
		Say: lockInInline, Source: cite.DNVC205}
	part.Estimate, part.Inner = x.Get(group.InlinePosition), math.Min(part.Factor, math.Pow(4.5, 0.25))
	if part.Estimate*part.Factor <= 1 {
		x.Add(part)
		return
	}
	x.AddOrWait(part, group.InlineScruton, func(v float64) float64 { return math.Min(part.Estimate, v) })
}

// lesser returns the part that is further from its onset: both conditions are
// needed for the hazard.
func lesser(a, b finding.Part) finding.Part {
	if b.Estimate < a.Estimate {
		return b
	}
	return a
}

// waitOn waits for the first of the groups that is missing.
func waitOn(x *finding.Context, p finding.Part, ids ...group.ID) {
	for _, id := range ids {
		if x.State(id) == group.Missing {
			x.Wait(p, id, nil)
			return
		}
	}
}
