package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// QuasiStaticGusts: gusts act as a static load. No class rests on it; it tells
// the gust response factor.
var QuasiStaticGusts = &Entry{
	ID:        "quasi-static-gusts",
	Title:     "Gusts as a static load",
	LeavesOut: "resonance of the mode with the turbulence of the wind",
	Estimated: "load: (1 + 7 I_u √(B² + R²))/(1 + 7 I_u B) − 1, R² = (π/4ζ) S_L R_ℓ R_b, peak factor 3.5",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.EN1991Gust, cite.Davenport1967},
	Estimate:  estimateGusts,
}

var (
	gustResonance = finding.Say("Resonance with the gusts raises the peak load by {e:%} above the quasi-static one, at a turbulence of {turbulence_intensity:%} and B² = {gust_background}.")
	noTurbulence  = finding.Say("No turbulence of the wind was given.")
	noWind        = finding.Say("The buffeting of a wind is solved for gases.")
	noGustKind    = finding.Say("The kind has no solution for gusts: it is no slender body across a wind.")
)

func estimateGusts(x *finding.Context) {
	switch {
	case !flows(x, group.Flow):
		return
	case !x.Is(group.Gas):
		x.NotApplicable(noWind)
		return
	case !x.Is(group.Cross):
		x.NotApplicable(notAcross)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	case !x.Has(group.TurbulenceIntensity):
		x.NotApplicable(noTurbulence)
		return
	case x.State(group.GustResonance) == group.Absent || x.State(group.GustResonance) == group.OffRange:
		x.NotApplicable(noGustKind)
		return
	}
	p := finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: gustResonance, Source: cite.EN1991Gust}
	if !x.Has(group.GustResonance) {
		waitOn(x, p, group.GustResonance)
		return
	}
	fluid := fluidDamping(x)
	x.AddOrWait(p, group.DampingRatio, func(structural float64) float64 { return gustExcess(x, structural+fluid) })
}

// gustExcess is the excess of the gust response factor over that without
// resonance, at the damping ratio ζ.
//
//	(1 + 2g I √(B² + R²))/(1 + 2g I B) − 1, g = 3.5, R² = (π/4ζ) S_L R_ℓ R_b
//
// Symbols: I turbulence intensity [1], B² background response [1], S_L R_ℓ R_b
// energy of the gusts at the mode, reduced by size [1]. Range: I up to 0.3 or
// so; 0 for I = 0. Accuracy: 10 to 20 %. Check: I 0.2, B² 0.6, R² 0.4: 0.1514.
// Source: EN 1991-1-4 Annex B, with δ = 2πζ, from memory.
func gustExcess(x *finding.Context, zeta float64) float64 {
	const peaks = 7 // 2g
	i, b := x.Get(group.TurbulenceIntensity), x.Get(group.GustBackground)
	resonance := math.Pi / 4 * x.Get(group.GustResonance) / math.Max(zeta, 1e-9)
	return (1+peaks*i*math.Sqrt(b+resonance))/(1+peaks*i*math.Sqrt(b)) - 1
}
