package canon

import (
	"math"

	"regimed/regime/cite"
)

// prandtlGlauertMax is the Mach number above which the linear subsonic factor
// no longer grows: it is singular at M = 1, and wrong before.
const prandtlGlauertMax = 0.9

// PrandtlGlauert is the excess of the linear compressible load over the
// incompressible one.
//
//	1/√(1 − M²) − 1 for M ≤ 0.9, its value at 0.9 above
//
// Symbols: mach = M [1].
// Range: 0 ≤ M ≤ 100. M→0: ½M².
// Accuracy: 1e-15 as a formula; the linear theory itself to about M 0.7.
// Check: M 0.5: 0.154700538379; above 0.9: 1.29415733871.
// Source: Glauert 1928 (from memory).
func PrandtlGlauert(mach float64) (float64, error) {
	if err := inRange("PrandtlGlauert", "mach", mach, 0, 100); err != nil {
		return 0, err
	}
	m := min(mach, prandtlGlauertMax)
	s := math.Sqrt((1 - m) * (1 + m))
	// (1 − s)/s with 1 − s = M²/(1 + s), which does not cancel at small M.
	return m * m / (s * (1 + s)), nil
}

// IsentropicDensityChange is the relative rise of density from the stream to a
// stagnation point.
//
//	ρ₀/ρ − 1 = (1 + (γ − 1)M²/2)^{1/(γ−1)} − 1
//
// Symbols: mach = M [1]; gamma = γ [1], ratio of specific heats.
// Range: 0 ≤ M ≤ 5; 1 ≤ γ ≤ 1.7 (γ = 1: exp(M²/2) − 1). M→0: ½M².
// Accuracy: exact for a perfect gas.
// Check: M 0.3, γ 1.4: 0.0456093184.
// Source: Liepmann & Roshko 1957 (from memory).
func IsentropicDensityChange(mach, gamma float64) (float64, error) {
	if err := inRange("IsentropicDensityChange", "mach", mach, 0, 5); err != nil {
		return 0, err
	}
	if err := inRange("IsentropicDensityChange", "gamma", gamma, 1, 1.7); err != nil {
		return 0, err
	}
	g := gamma - 1
	x := mach * mach / 2
	if g*x < 1e-300 {
		return math.Expm1(x), nil
	}
	return math.Expm1(math.Log1p(g*x) / g), nil
}

var prandtlGlauertEntry = &Entry{
	Name:     "PrandtlGlauert",
	Problem:  "excess of the compressible over the incompressible load of a thin body",
	Equation: "1/√(1 − M²) − 1 for M ≤ 0.9, its value there above",
	Args:     []Arg{{Name: "mach", Symbol: "M", Doc: "Mach number", Min: 0, Max: 100, From: 0, To: 1.2}},
	Outputs:  []Output{{ID: "excess", Symbol: "e", Doc: "relative excess"}},
	Accuracy: 1e-14,
	Factor:   1.3,
	Sources:  []*cite.Source{cite.Glauert1928},
	Note:     "linear subsonic flow: from M 0.7 or so shocks come first",
	Limits: []Limit{
		{"slow: ½M²", "excess", Low, 1e-12, func(a []float64) float64 { return a[0] * a[0] / 2 }},
		{"held at M 0.9: 1.294", "excess", High, 1e-12, constant(1/math.Sqrt(0.19) - 1)},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := PrandtlGlauert(a[0])
		return []float64{v}, err
	},
}

var isentropicDensityChangeEntry = &Entry{
	Name:     "IsentropicDensityChange",
	Problem:  "relative rise of the density of a gas that is brought to rest",
	Equation: "(1 + (γ − 1)M²/2)^{1/(γ−1)} − 1",
	Args: []Arg{
		{Name: "mach", Symbol: "M", Doc: "Mach number", Min: 0, Max: 5, From: 0, To: 2},
		{Name: "gamma", Symbol: "γ", Doc: "ratio of specific heats", Min: 1, Max: 1.7, Optional: true, Default: 1.4},
	},
	Outputs:  []Output{{ID: "change", Symbol: "Δρ/ρ", Doc: "relative density change"}},
	Accuracy: 1e-12,
	Factor:   1,
	Sources:  []*cite.Source{cite.Liepmann1957},
	Limits: []Limit{
		{"slow: ½M²", "change", Low, 1e-12, func(a []float64) float64 { return a[0] * a[0] / 2 }},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := IsentropicDensityChange(a[0], a[1])
		return []float64{v}, err
	},
}
