package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoWaveResonance: the waves keep off the natural frequencies.
var NoWaveResonance = &Entry{
	ID:        "no-wave-resonance",
	Title:     "No resonance with waves",
	LeavesOut: "waves at a natural frequency, or at a half or a third of it",
	Estimated: "position of the wave frequency in 0.8 … 1.25 of the wet natural frequency, of pitch and of surge; the second and third harmonic of a steep wave (springing, ringing) are reported and never rule out: they reach (ka)ⁿ⁻¹/(2ζ) of the first",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Newman1977, cite.Faltinsen1990},
	Hazard:    "Waves at a natural frequency move or stress a structure far beyond its quasi-static response: the code in force for it, and its fatigue check, decide.",
	Estimate:  estimateWaveResonance,
}

var (
	waveMode   = finding.Say("The waves run at {wave_frequency_ratio} times the wet natural frequency.")
	wavePitch  = finding.Say("The waves run at {wave_frequency_ratio_pitch} times the frequency of pitch.")
	waveSurge  = finding.Say("The waves run at {wave_frequency_ratio_surge} times the frequency of surge.")
	waveSecond = finding.Say("For the second harmonic of the waves (springing): they run at {wave_frequency_ratio} times the frequency of the mode, with a steepness of {wave_steepness}.")
	waveThird  = finding.Say("For the third harmonic of the waves (ringing): they run at {wave_frequency_ratio} times the frequency of the mode, with a steepness of {wave_steepness}.")
)

func estimateWaveResonance(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.Waves):
		x.NotApplicable(noWaves)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	}
	addResonance(x, group.WaveRatio, waveMode, cite.Newman1977)
	addResonance(x, group.WaveRatioPitch, wavePitch, cite.Newman1977)
	addResonance(x, group.WaveRatioSurge, waveSurge, cite.Newman1977)
	addHarmonic(x, 2, waveSecond)
	addHarmonic(x, 3, waveThird)
}

// addHarmonic adds the position of a harmonic of the waves in the band, where
// the waves are steep enough for it to grow to the size of the first. It is
// kept from ruling out: the size is an order of magnitude.
func addHarmonic(x *finding.Context, n float64, say *finding.Sentence) {
	if !x.Has(group.WaveRatio) || !x.Has(group.WaveSteepness) {
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.15, Say: say, Source: cite.Faltinsen1990}
	u, _ := finding.Band(n*x.Get(group.WaveRatio), resonanceLow, resonanceHigh, p.Factor)
	size := math.Pow(math.Pi*x.Get(group.WaveSteepness), n-1)
	if zeta := orZero(x, group.DampingTotal); zeta > 0 {
		size /= 2 * zeta
	} else {
		size = 1
	}
	p.Estimate = math.Min(1, math.Min(u, size))
	x.Add(p)
}
