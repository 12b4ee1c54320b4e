package canon

import (
	"math"

	"regimed/regime/cite"
)

// GeneralisedCoupling turns a coupling factor k² into the generalised K².
//
//	K² = k²/(1 − k²)
//
// Symbols: k2 = k² [1], share of the energy that is converted in a cycle.
// Range: 0 ≤ k² ≤ 0.99.
// Accuracy: exact.
// Check: k² 0.2: 0.25.
// Source: Hagood & von Flotow 1991 (from memory).
func GeneralisedCoupling(k2 float64) (float64, error) {
	if err := inRange("GeneralisedCoupling", "k2", k2, 0, 0.99); err != nil {
		return 0, err
	}
	return k2 / (1 - k2), nil
}

// Electromechanical is what a piezoelectric part does to a mode: the rise of its
// frequency from short to open circuit, and the damping by a matched resistor.
//
//	complex stiffness 1 + K² iωRC/(1 + iωRC): ω_open/ω_short = √(1 + K²);
//	greatest loss factor η = K²/(2√(1 + K²)) at ωRC = 1/√(1 + K²), ζ = η/2
//
// Symbols: K2 = K² [1], generalised coupling (GeneralisedCoupling); frequencyRatio
// [1]; damping = ζ [1]; load = ωRC [1], the matched one.
// Range: 0 ≤ K² ≤ 99.
// Accuracy: exact as loss factor; as a damping ratio for K² below about 0.5. K²→0: ζ → K²/4.
// Check: K² 0.25: ratio 1.11803398875, ζ 0.0559016994375.
// Source: Hagood & von Flotow 1991 (from memory).
func Electromechanical(K2 float64) (frequencyRatio, damping, load float64, err error) {
	if err := inRange("Electromechanical", "coupling", K2, 0, 99); err != nil {
		return 0, 0, 0, err
	}
	r := math.Sqrt(1 + K2)
	return r, K2 / (4 * r), 1 / r, nil
}

var electromechanicalEntry = &Entry{
	Name:     "Electromechanical",
	Problem:  "frequency shift and shunt damping of a mode with a piezoelectric part",
	Equation: "ω_open/ω_short = √(1 + K²); ζ = K²/(4√(1 + K²)) at ωRC = 1/√(1 + K²)",
	Args:     []Arg{{Name: "coupling", Symbol: "K²", Doc: "generalised coupling k²/(1 − k²)", Min: 0, Max: 99, From: 0.01, To: 10}},
	Outputs: []Output{
		{ID: "frequency_ratio", Symbol: "ω_open/ω_short", Doc: "open- over short-circuit frequency"},
		{ID: "damping", Symbol: "ζ", Doc: "damping ratio that a matched resistor adds"},
		{ID: "load", Symbol: "ωRC", Doc: "matched resistance times capacitance and frequency"},
	},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.HagoodVonFlotow1991},
	Limits: []Limit{
		{"weak coupling: K²/4", "damping", Low, 1e-12, func(a []float64) float64 { return a[0] / 4 }},
	},
	Eval: func(a []float64) ([]float64, error) {
		ratio, damping, load, err := Electromechanical(a[0])
		return []float64{ratio, damping, load}, err
	},
}

var generalisedCouplingEntry = &Entry{
	Name:     "GeneralisedCoupling",
	Problem:  "generalised coupling from the coupling factor",
	Equation: "K² = k²/(1 − k²)",
	Args:     []Arg{{Name: "k2", Symbol: "k²", Doc: "share of the energy converted in a cycle", Min: 0, Max: 0.99, From: 0, To: 0.9}},
	Outputs:  []Output{{ID: "coupling", Symbol: "K²", Doc: "generalised coupling"}},
	Accuracy: 1e-12,
	Factor:   1,
	Sources:  []*cite.Source{cite.HagoodVonFlotow1991},
	Limits: []Limit{
		{"weak coupling: k²", "coupling", Low, 1e-12, func(a []float64) float64 { return a[0] }},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := GeneralisedCoupling(a[0])
		return []float64{v}, err
	},
}
