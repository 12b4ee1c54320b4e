package canon

import (
	"math"

	"regimed/regime/cite"
)

// waveNumberMax is the end of the stated range of ω²d/g.
const waveNumberMax = 1e12

// WaveNumber solves the dispersion relation of gravity waves for kd.
//
//	ω² = g k tanh(kd):  x tanh x = κ, x = kd
//
// Symbols: kappa = κ = ω²d/g [1], d the still-water depth.
// Range: 0 ≤ κ ≤ 1e12. κ→0: √κ(1 + κ/6); κ→∞: κ.
// Accuracy: 1e-12 relative.
// Check: κ 1: 1.19967864026.
// Source: Airy 1845; Dean & Dalrymple 1991 (from memory).
func WaveNumber(kappa float64) (float64, error) {
	if err := inRange("WaveNumber", "kappa", kappa, 0, waveNumberMax); err != nil {
		return 0, err
	}
	if kappa < 1e-300 {
		return math.Sqrt(kappa), nil
	}
	// κ/√tanh κ is within 5 % everywhere and exact in both limits, so that
	// Newton's method needs a few steps.
	x := kappa / math.Sqrt(math.Tanh(kappa))
	for range 8 {
		t := math.Tanh(x)
		dx := (x*t - kappa) / (t + x*(1-t)*(1+t))
		x -= dx
		if math.Abs(dx) <= 1e-15*x {
			break
		}
	}
	return x, nil
}

// StokesSecondOrder is the amplitude of the second harmonic of the elevation of
// a regular wave over that of the first.
//
//	a₂/a = (ka/4)(3 − t²)/t³, t = tanh kd
//
// Symbols: ka [1], wave number times first-order amplitude; kd [1].
// Range: 0 ≤ ka ≤ 0.5; 1e-3 ≤ kd ≤ 1e6. kd→∞: ka/2; kd→0: 3ka/(4(kd)³).
// Accuracy: exact to second order; the expansion itself needs a ratio well
// below 1 and a small Ursell number.
// Check: ka 0.1, kd 1: 0.136955653.
// Source: Dean & Dalrymple 1991 (from memory).
func StokesSecondOrder(ka, kd float64) (float64, error) {
	if err := checkStokes("StokesSecondOrder", ka, kd); err != nil {
		return 0, err
	}
	t := math.Tanh(kd)
	return ka / 4 * (3 - t*t) / (t * t * t), nil
}

// Ursell is the Ursell number of a regular wave.
//
//	Ur = Hλ²/d³ = 8π² ka/(kd)³
//
// Symbols: ka [1], wave number times amplitude H/2; kd [1].
// Range: 0 ≤ ka ≤ 0.5; 1e-3 ≤ kd ≤ 1e6.
// Accuracy: exact. Second-order theory holds below about 8π²/3 = 26.
// Check: ka 0.1, kd 1: 7.89568352087.
// Source: Dean & Dalrymple 1991 (from memory).
func Ursell(ka, kd float64) (float64, error) {
	if err := checkStokes("Ursell", ka, kd); err != nil {
		return 0, err
	}
	return 8 * math.Pi * math.Pi * ka / (kd * kd * kd), nil
}

func checkStokes(function string, ka, kd float64) error {
	if err := inRange(function, "ka", ka, 0, 0.5); err != nil {
		return err
	}
	return inRange(function, "kd", kd, 1e-3, 1e6)
}

var waveNumberEntry = &Entry{
	Name:     "WaveNumber",
	Problem:  "wave number of gravity waves on water of finite depth",
	Equation: "ω² = g k tanh(kd)",
	Args:     []Arg{{Name: "kappa", Symbol: "ω²d/g", Doc: "frequency squared times depth over gravity", Min: 0, Max: waveNumberMax, From: 1e-3, To: 100}},
	Outputs:  []Output{{ID: "kd", Symbol: "kd", Doc: "wave number times depth"}},
	Accuracy: 1e-12,
	Factor:   1,
	Sources:  []*cite.Source{cite.Airy1845, cite.DeanDalrymple1991},
	Limits: []Limit{
		{"shallow: √κ", "kd", Low, 1e-12, func(a []float64) float64 { return math.Sqrt(a[0]) }},
		{"deep: κ", "kd", High, 1e-12, func(a []float64) float64 { return a[0] }},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := WaveNumber(a[0])
		return []float64{v}, err
	},
}

var stokesSecondOrderEntry = &Entry{
	Name:     "StokesSecondOrder",
	Problem:  "second-order over first-order elevation of a regular wave, and its Ursell number",
	Equation: "a₂/a = (ka/4)(3 − t²)/t³, t = tanh kd; Ur = 8π²ka/(kd)³",
	Over:     "kd",
	Args: []Arg{
		{Name: "ka", Symbol: "ka", Doc: "wave number times amplitude", Min: 0, Max: 0.5, Typical: 0.1},
		{Name: "kd", Symbol: "kd", Doc: "wave number times depth", Min: 1e-3, Max: 1e6, From: 0.1, To: 10},
	},
	Outputs: []Output{
		{ID: "ratio", Symbol: "a₂/a", Doc: "second harmonic over first"},
		{ID: "ursell", Symbol: "Ur", Doc: "Ursell number Hλ²/d³"},
	},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.DeanDalrymple1991},
	Note:     "a ratio near 1 says that the expansion fails, not how large the wave is",
	Limits: []Limit{
		{"shallow: 3ka/(4(kd)³)", "ratio", Low, 1e-5, func(a []float64) float64 { return 0.75 * a[0] / (a[1] * a[1] * a[1]) }},
		{"deep: ka/2", "ratio", High, 1e-12, func(a []float64) float64 { return a[0] / 2 }},
	},
	Eval: func(a []float64) ([]float64, error) {
		ratio, err := StokesSecondOrder(a[0], a[1])
		if err != nil {
			return nil, err
		}
		ur, err := Ursell(a[0], a[1])
		return []float64{ratio, ur}, err
	},
}
