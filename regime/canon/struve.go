package canon

import "math"

const (
	struveNear = 4
	struveFar  = 40
)

// struveH1 returns Struve's function H₁(x) for x ≥ 0.
//
// The power series serves small x, where its terms do not yet cancel; the
// series of Bessel functions, H₁ = (2/π)(1 − J₀) + (4/π) Σ J₂ₖ/(4k²−1), which
// never cancels, the middle; Y₁ and the expansion in 1/x² the far range.
//
// Relative accuracy 1e-13. Check value: H₁(2) = 0.64676372828356.
// Source: Abramowitz & Stegun 1964, 12.1.5, 12.1.20, 12.1.31 (from memory).
func struveH1(x float64) float64 {
	switch {
	case x <= struveNear:
		return struveH1Series(x)
	case x <= struveFar:
		return struveH1Neumann(x)
	default:
		return math.Y1(x) + struveH1Tail(x)
	}
}

// struveH1Series sums (2/π)[x²/(1²·3) − x⁴/(1²·3²·5) + …].
func struveH1Series(x float64) float64 {
	x2 := x * x
	term := x2 / 3
	sum := term
	for k := 1.0; k < 60; k++ {
		term *= -x2 / ((2*k + 1) * (2*k + 3))
		sum += term
		if math.Abs(term) < 1e-18*math.Abs(sum) {
			break
		}
	}
	return 2 / math.Pi * sum
}

// struveH1Neumann takes J₂ₖ from the backward recurrence, which is stable, and
// scales it by J₀ + 2ΣJ₂ₖ = 1.
func struveH1Neumann(x float64) float64 {
	n := 2 * (int(x)/2 + 20)
	above, here := 0.0, 1e-300
	weighted, norm := 0.0, 0.0
	for k := n; k >= 1; k-- {
		if k%2 == 0 {
			weighted += here / float64(k*k-1)
			norm += 2 * here
		}
		above, here = here, float64(2*k)/x*here-above
		if math.Abs(here) > 1e200 {
			above, here, weighted, norm = above*1e-200, here*1e-200, weighted*1e-200, norm*1e-200
		}
	}
	norm += here
	return 2 / math.Pi * (1 - here/norm + 2*weighted/norm)
}

// struveH1Tail is H₁ − Y₁ = (2/π)(1 + 1/x² − 3/x⁴ + 45/x⁶ − …).
func struveH1Tail(x float64) float64 {
	w := 1 / (x * x)
	sum, term := 1.0, 1.0
	for k := 0.0; k < 20; k++ {
		term *= (2*k + 1) * (1 - 2*k) * w
		sum += term
		if math.Abs(term) < 1e-18 {
			break
		}
	}
	return 2 / math.Pi * sum
}
