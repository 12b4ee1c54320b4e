package canon

import (
	"math"

	"regimed/regime/cite"
)

// theodorsenMax is the end of the stated range.
const theodorsenMax = 1e8

// Theodorsen is the lift deficiency function of an oscillating thin aerofoil.
//
//	C(k) = H₁⁽²⁾(k)/(H₁⁽²⁾(k) + i H₀⁽²⁾(k))
//
// Symbols: k = ωb/U [1], b the semichord, motion e^{+iωt}; C = re + i·im, im ≤ 0.
// Range: 0 ≤ k ≤ 1e8. k→0: 1 − πk/2 + ik(ln(k/2) + 0.5772); k→∞: ½ − i/(8k).
// Accuracy: 1e-12 of each part.
// Check: k 0.1: 0.831924104965 − 0.172302228734i.
// Source: Theodorsen 1935, NACA Report 496 (from memory).
func Theodorsen(k float64) (re, im float64, err error) {
	if err := inRange("Theodorsen", "k", k, 0, theodorsenMax); err != nil {
		return 0, 0, err
	}
	re, im = theodorsenC(k)
	return re, im, nil
}

// theodorsenC is Theodorsen on its range, without the check.
func theodorsenC(k float64) (re, im float64) {
	switch {
	case k < 1e-120: // the squares of Y₁ would overflow; C = 1 to all digits
		return 1, 0
	case k > 30:
		return theodorsenFar(k)
	}
	j0, y0 := math.J0(k), math.Y0(k)
	j1, y1 := math.J1(k), math.Y1(k)
	p, q := j1+y0, y1-j0
	d := p*p + q*q
	return (j1*p + y1*q) / d, -(y1*y0 + j1*j0) / d
}

// theodorsenFar sums Hankel's asymptotic series: iH₀/H₁ is the ratio of the
// series S₀/S₁ without their common factor, so that nothing cancels and no
// large argument is reduced.
func theodorsenFar(k float64) (re, im float64) {
	s0 := hankelSeries(0, k)
	s1 := hankelSeries(1, k)
	c := s1 / (s0 + s1)
	return real(c), imag(c)
}

// hankelSeries is Σ (−i)ⁿ aₙ(ν)/kⁿ of H_ν⁽²⁾, aₙ = Π(4ν² − (2j−1)²)/(n! 8ⁿ), up
// to its smallest term.
func hankelSeries(nu, k float64) complex128 {
	term := complex(1, 0)
	sum := term
	for n := 1; n <= 40; n++ {
		odd := float64(2*n - 1)
		factor := (4*nu*nu - odd*odd) / (8 * k * float64(n))
		if math.Abs(factor) >= 1 {
			break
		}
		term *= complex(0, -factor)
		sum += term
		if math.Abs(real(term))+math.Abs(imag(term)) < 1e-18 {
			break
		}
	}
	return sum
}

var theodorsenEntry = &Entry{
	Name:     "Theodorsen",
	Problem:  "lift deficiency of a thin aerofoil that oscillates in incompressible flow",
	Equation: "C(k) = H₁⁽²⁾/(H₁⁽²⁾ + iH₀⁽²⁾)",
	Args: []Arg{
		{Name: "k", Symbol: "k", Doc: "reduced frequency ωb/U, b the semichord", Min: 0, Max: theodorsenMax, From: 1e-3, To: 100},
	},
	Outputs: []Output{
		{ID: "re", Symbol: "F", Doc: "real part of C"},
		{ID: "im", Symbol: "G", Doc: "imaginary part of C, negative: lag"},
	},
	Accuracy: 1e-12,
	Factor:   1.3,
	Sources:  []*cite.Source{cite.Theodorsen1935},
	Limits: []Limit{
		{"slow: 1 − πk/2", "re", Low, 1e-12, func(a []float64) float64 { return 1 - math.Pi/2*a[0] }},
		{"slow: k(ln(k/2) + 0.5772)", "im", Low, 1e-12, func(a []float64) float64 {
			if a[0] == 0 {
				return 0
			}
			return a[0] * (math.Log(a[0]/2) + eulerGamma)
		}},
		{"fast: ½", "re", High, 1e-12, constant(0.5)},
		{"fast: −1/(8k)", "im", High, 1e-12, func(a []float64) float64 { return -1 / (8 * a[0]) }},
	},
	Eval: func(a []float64) ([]float64, error) {
		re, im, err := Theodorsen(a[0])
		return []float64{re, im}, err
	},
}
