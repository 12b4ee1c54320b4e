package canon

import (
	"math"

	"regimed/regime/cite"
)

// Constants of the wake oscillator, calibrated on rigid cylinders in
// subcritical flow (Facchinetti, de Langre & Biolley 2004, from memory).
const (
	WakeOscillatorA   = 12.0
	WakeOscillatorCL0 = 0.3
)

// WakeLockIn is the band of x = St·U/(f_w D) in which the linear pair of
// structural and wake oscillator is unstable.
//
//	ÿ + y = M Ω² q,  q̈ + Ω² q = A ÿ:  1/(1 + √(AM)) < Ω < 1/(1 − √(AM))
//
// Symbols: am = A·M [1], the product of coupling coefficient and mass number
// (WakeLockInParameter); Ω = x, shedding over structural frequency, the latter
// in the fluid.
// Range: AM ≥ 0. For AM ≥ 1 there is no upper end: hi = +Inf.
// Accuracy: exact for the linear undamped pair; the band of a real wake is the
// model's to about 20 %.
// Check: AM 0.2: 0.690983005625 and 1.80901699437.
// Source: de Langre 2006 (from memory).
func WakeLockIn(am float64) (lo, hi float64, err error) {
	if !(am >= 0) || math.IsInf(am, 1) {
		return 0, 0, &RangeError{Function: "WakeLockIn", Arg: "am", Value: am, Min: 0, Max: wakeLockInMax}
	}
	r := math.Sqrt(am)
	lo = 1 / (1 + r)
	if r >= 1 {
		return lo, math.Inf(1), nil
	}
	return lo, 1 / (1 - r), nil
}

const wakeLockInMax = 1e6

// WakeLockInParameter is the product AM of the wake oscillator.
//
//	AM = A C_L0/(16 π² St² μ′), A = 12, C_L0 = 0.3
//
// Symbols: strouhal = St [1]; massNumber = μ′ = (m + m_a)/(ρD²) [1], masses per
// length, added mass included.
// Range: St > 0, μ′ > 0.
// Accuracy: exact.
// Check: St 0.2, μ′ 2: AM 0.284966.
// Source: Facchinetti, de Langre & Biolley 2004 (from memory).
func WakeLockInParameter(strouhal, massNumber float64) (float64, error) {
	if err := inRange("WakeLockInParameter", "strouhal", strouhal, 1e-3, 1); err != nil {
		return 0, err
	}
	if err := inRange("WakeLockInParameter", "mass_number", massNumber, 1e-3, 1e12); err != nil {
		return 0, err
	}
	return WakeOscillatorA * WakeOscillatorCL0 / (16 * math.Pi * math.Pi * strouhal * strouhal * massNumber), nil
}

var wakeLockInEntry = &Entry{
	Name:     "WakeLockIn",
	Problem:  "band of shedding over wet structural frequency in which structure and wake lock in",
	Equation: "1/(1 + √(AM)) < St U/(f_w D) < 1/(1 − √(AM))",
	Args: []Arg{
		{Name: "am", Symbol: "AM", Doc: "A C_L0/(16π²St²μ′), μ′ = (m + m_a)/(ρD²)", Min: 0, Max: wakeLockInMax, From: 1e-3, To: 10},
	},
	Outputs: []Output{
		{ID: "low", Symbol: "x_min", Doc: "lower end of the band"},
		{ID: "high", Symbol: "x_max", Doc: "upper end of the band; infinite for AM ≥ 1", Unbounded: true},
	},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Facchinetti2004, cite.DeLangre2006},
	Note:     "no damping in it: whether lock-in matters is decided by the amplitude beside it; for AM ≥ 1 no upper end",
	Limits: []Limit{
		{"heavy, resonance only: 1 − √(AM)", "low", Low, 1e-12, func(a []float64) float64 { return 1 - math.Sqrt(a[0]) }},
		{"heavy, resonance only: 1 + √(AM)", "high", Low, 1e-12, func(a []float64) float64 { return 1 + math.Sqrt(a[0]) }},
		{"light: 1/√(AM)", "low", High, 2e-3, func(a []float64) float64 { return 1 / math.Sqrt(a[0]) }},
	},
	Eval: func(a []float64) ([]float64, error) {
		lo, hi, err := WakeLockIn(a[0])
		return []float64{lo, hi}, err
	},
}

var wakeLockInParameterEntry = &Entry{
	Name:     "WakeLockInParameter",
	Problem:  "coupling parameter of structure and wake oscillator",
	Equation: "AM = A C_L0/(16π² St² μ′), A = 12, C_L0 = 0.3",
	Args: []Arg{
		{Name: "strouhal", Symbol: "St", Doc: "Strouhal number", Min: 1e-3, Max: 1, From: 0.05, To: 0.5, Typical: 0.2},
		{Name: "mass_number", Symbol: "μ′", Doc: "(m + m_a)/(ρD²), per length, added mass included", Min: 1e-3, Max: 1e12, From: 0.1, To: 1e3, Typical: 2},
	},
	Outputs:  []Output{{ID: "am", Symbol: "AM", Doc: "coupling parameter"}},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Facchinetti2004, cite.DeLangre2006},
	Eval: func(a []float64) ([]float64, error) {
		am, err := WakeLockInParameter(a[0], a[1])
		return []float64{am}, err
	},
}
