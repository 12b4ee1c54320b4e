package canon

import (
	"math"
	"math/cmplx"
)

const (
	filmMaxSigma  = 1e12
	filmMaxAspect = 1e6
	// filmFarSigma is where exp(−√(σ/2)), which the expansion for large σ leaves
	// out, has fallen to 1e-17.
	filmFarSigma = 3200
)

// ThinFilm gives the force of the gas between two parallel rectangular plates
// that approach and part with a small amplitude, with all four edges open.
//
//	G = k_film + iωc_film over p_a A/h
//	  = (64/π⁴) Σ_{m,n odd} iσ/(m²n²(π²(m² + β²n²) + iσ)), σ = 12ηωL²/(p_a h²), β = L/W
//
// L and W the sides (m), A = LW, h the gap (m), η the dynamic viscosity (Pa s), ω
// the circular frequency (rad/s), p_a the ambient pressure (Pa). Isothermal; inertia
// and the flow round the edges are left out. The result is the real part,
// spring = k_film h/(p_a A), and the imaginary part, damping = ωc_film h/(p_a A).
// L may be either side, and β = 0 is a strip with L across it.
//
// Range: σ from 0 to 1e12, β from 0 to 1e6. Accuracy: 1e-9 of each part.
// Check value: σ = 10, β = 1 gives 0.135796862397 and 0.283307853753. Limits:
// σ → 0 damping only, (σ/12) ThinFilmLiquid(β); σ → ∞ spring 1, gas that has no time
// to escape. In rarefied gas η is multiplied by VeijolaViscosity.
//
// Source: Langlois 1962, Q. Appl. Math. 20; Blech 1983, J. Lubr. Technol. 105
// (from memory).
func ThinFilm(sigma, aspect float64) (spring, damping float64, err error) {
	const name = "ThinFilm"
	if err := inRange(name, "sigma", sigma, 0, filmMaxSigma); err != nil {
		return 0, 0, err
	}
	if err := inRange(name, "aspect", aspect, 0, filmMaxAspect); err != nil {
		return 0, 0, err
	}
	if aspect > 1 {
		// The same plate, seen from its other side.
		sigma, aspect = sigma/(aspect*aspect), 1/aspect
	}
	if sigma == 0 {
		return 0, 0, nil
	}
	g, _ := filmForce(sigma, aspect)
	return real(g), imag(g), nil
}

// thinFilmUncertainty is the larger relative change of spring and damping that
// what is left out of the series may make.
func thinFilmUncertainty(sigma, aspect float64) float64 {
	if aspect > 1 {
		sigma, aspect = sigma/(aspect*aspect), 1/aspect
	}
	if sigma == 0 {
		return 0
	}
	g, rest := filmForce(sigma, aspect)
	return max(math.Abs(real(rest)/real(g)), math.Abs(imag(rest)/imag(g)))
}

// filmForce sums the series over n in closed form. What is left is the strip,
// 1 − tanh(t)/t with t = √(iσ)/2, less the loss through the short edges,
//
//	(16β/π²) Σ_{m odd} iσ/(m²B^{3/2}) tanh(√B/(2β)), B = π²m² + iσ, β ≤ 1
//
// in which the tanh differs from 1 only in the first few terms. Far out the
// edges no longer feel each other, which leaves three terms. rest is of the size
// of what the sum leaves out.
func filmForce(sigma, aspect float64) (force, rest complex128) {
	s := complex(0, sigma)
	if sigma > filmFarSigma {
		far := math.Exp(-math.Sqrt(sigma / 2))
		return 1 - complex(2*(1+aspect), 0)/cmplx.Sqrt(s) + complex(16*aspect/math.Pi, 0)/s, complex(far, far)
	}
	strip := filmStrip(s)
	if aspect == 0 {
		return strip, 0
	}
	sum, left := filmEdgeSum(s, aspect)
	scale := complex(16*aspect/(math.Pi*math.Pi), 0)
	return strip - scale*sum, scale * left
}

// filmStrip returns 1 − tanh(t)/t, t² = s/4. The continued fraction keeps real
// and imaginary part apart as s → 0.
func filmStrip(s complex128) complex128 {
	u := s / 4
	if imag(s) > 400 {
		t := cmplx.Sqrt(u)
		return 1 - filmTanh(t)/t
	}
	var f complex128
	for k := 61.0; k >= 3; k -= 2 {
		f = u / (complex(k, 0) + f)
	}
	return f / (1 + f)
}

// filmTanh is tanh t for Re t ≥ 0, without overflow.
func filmTanh(t complex128) complex128 {
	if real(t) > 20 {
		return 1
	}
	e := cmplx.Exp(-2 * t)
	return (1 - e) / (1 + e)
}

// filmEdgeSum sums s tanh(√B/(2·aspect))/(m²B^{3/2}) over odd m: the first terms
// as they stand, the others, where the tanh is 1, by the midpoint form of the
// Euler–Maclaurin formula about their integral.
func filmEdgeSum(s complex128, aspect float64) (total, rest complex128) {
	first := 25 + 2*math.Ceil(math.Sqrt(imag(s))/math.Pi)
	var sum complex128
	for m := 1.0; m < first; m += 2 {
		b := complex(math.Pi*math.Pi*m*m, 0) + s
		root := cmplx.Sqrt(b)
		term := s / (complex(m*m, 0) * b * root)
		if real(root) < 20*2*aspect {
			term *= filmTanh(root / complex(2*aspect, 0))
		}
		sum += term
	}
	tail, rest := filmEdgeTail(s, first-1)
	return sum + tail, rest
}

// filmEdgeTail is the sum of f(m) = s/(m²B^{3/2}) over m = from+1, from+3, …:
//
//	½∫f dm + f′/12 − 7f‴/720 at m = from
//
// The integral is known, and f′/f = g is a short rational function of m. f falls
// about as m⁻⁵ at least, so that the next term, 31f⁽⁵⁾/30240, is 8/m² of the last.
func filmEdgeTail(s complex128, from float64) (tail, rest complex128) {
	const pi2 = math.Pi * math.Pi
	u := complex(math.Pi*from, 0)
	b := u*u + s
	root := cmplx.Sqrt(b)
	integral := complex(math.Pi, 0) * s / (u * root * (root + u) * (root + u))
	f := s / (complex(from*from, 0) * b * root)
	m := complex(from, 0)
	w := complex(pi2, 0) / b
	g := -2/m - 3*w*m
	g1 := 2/(m*m) - 3*w + 6*w*w*m*m
	g2 := -4/(m*m*m) + 18*w*w*m - 24*w*w*w*m*m*m
	last := 7 * f * (g*g*g + 3*g*g1 + g2) / 720
	return integral/2 + f*g/12 - last, last * complex(8/(from*from), 0)
}

// ThinFilmLiquid gives the damping of a liquid film between two parallel
// rectangular plates with open edges: the limit of ThinFilm without compression.
//
//	c_film/(ηL²A/h³) = (768/π⁶) Σ_{m,n odd} 1/(m²n²(m² + β²n²))
//	                 = 1 − (192β/π⁵) Σ_{m odd} tanh(πm/(2β))/m⁵, β = L/W
//
// L and W the sides (m), A = LW, h the gap (m), η the dynamic viscosity (Pa s). L may
// be either side, and β = 0 is a strip with L across it.
//
// Range: β from 0 to 1e6. Accuracy: 1e-12. Check value: the square
// 0.421731044865. Limits: β → 0 1; β → ∞ 1/β².
//
// Source: Langlois 1962, Q. Appl. Math. 20; the series is that of the laminar flow
// in a rectangular duct (from memory).
func ThinFilmLiquid(aspect float64) (damping float64, err error) {
	if err := inRange("ThinFilmLiquid", "aspect", aspect, 0, filmMaxAspect); err != nil {
		return 0, err
	}
	if aspect > 1 {
		b := 1 / aspect
		return filmLiquid(b) * b * b, nil
	}
	return filmLiquid(aspect), nil
}

// filmLiquidLeftOut bounds what filmLiquid leaves out, relative: the first term of
// a series whose exponents pass 40.
const filmLiquidLeftOut = 4.3e-18

// filmLiquid takes Σ 1/m⁵ over odd m as (31/32)ζ(5) and sums the remainder, which
// decays exponentially.
func filmLiquid(aspect float64) float64 {
	const zeta5 = 1.036927755143369926331365486457 // Abramowitz & Stegun 1964, table 23.3
	if aspect == 0 {
		return 1
	}
	sum := 31. / 32 * zeta5
	for m := 1.0; m < 40; m += 2 {
		x := math.Pi * m / aspect
		if x > 40 {
			break
		}
		m2 := m * m
		sum -= 2 / (math.Exp(x) + 1) / (m2 * m2 * m)
	}
	return 1 - 192*aspect/(math.Pi*math.Pi*math.Pi*math.Pi*math.Pi)*sum
}

// VeijolaViscosity gives the viscosity that a rarefied gas shows in a narrow gap.
//
//	η_eff/η = 1/(1 + 9.638 Kn^1.159), Kn = ℓ/h
//
// ℓ the mean free path (m), h the gap (m), η the dynamic viscosity (Pa s).
//
// Range: Kn from 0 to 880. Accuracy: a fit within 5 % of the linearised
// Boltzmann equation (from memory). Check value: Kn = 0.034 gives 0.8393.
// Limit: Kn → 0 1.
//
// Source: Veijola, Kuisma, Lahdenperä & Ryhänen 1995, Sensors and Actuators A 48
// (from memory).
func VeijolaViscosity(kn float64) (ratio float64, err error) {
	if err := inRange("VeijolaViscosity", "Kn", kn, 0, 880); err != nil {
		return 0, err
	}
	return 1 / (1 + 9.638*math.Pow(kn, 1.159)), nil
}
