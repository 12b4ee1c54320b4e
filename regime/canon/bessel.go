package canon

import (
	"math"
	"math/cmplx"
)

// Bessel functions of complex argument, for the sector |arg z| ≤ π/4 in which
// oscillating viscous layers live: z = √(iωa²/ν) has the argument π/4. The
// functions of the imaginary axis, those of sound, come from package math, and
// beyond besselFar from the expansion here, which holds there too.
//
// Three evaluations hand over to each other, each accurate to about 1e-13 at
// the hand-over, so that none shows: the power series for small |z|, Temme's
// form of Steed's continued fraction between, Hankel's expansion beyond. Its
// smallest term is of order exp(−2|z|), 1e-16 at besselFar.
//
// Sources: Abramowitz & Stegun 1964, 9.6.10 to 9.6.13, 9.7.1, 9.7.2;
// Temme 1975 for the continued fraction (from memory).
const (
	besselNear = 2.5
	besselFar  = 18
	eulerGamma = 0.57721566490153286060651209008240243
	// besselEps stops a series: a term below it no longer changes the sum.
	besselEps = 1e-18
)

// besselSize is a norm of z that costs no square root.
func besselSize(z complex128) float64 {
	return math.Abs(real(z)) + math.Abs(imag(z))
}

// besselScale is fz: a product with a real number costs half of a complex one.
func besselScale(z complex128, f float64) complex128 {
	return complex(real(z)*f, imag(z)*f)
}

// besselInverse is 1/z for z of moderate size, which needs no care for overflow.
func besselInverse(z complex128) complex128 {
	d := 1 / (real(z)*real(z) + imag(z)*imag(z))
	return complex(real(z)*d, -imag(z)*d)
}

// besselKRatio returns K₁(z)/K₀(z) for |arg z| ≤ π/2, z ≠ 0.
func besselKRatio(z complex128) complex128 {
	switch r := cmplx.Abs(z); {
	case r <= besselNear:
		k0, k1 := besselKSeries(z)
		return k1 / k0
	case r <= besselFar:
		_, ratio := besselKFraction(z)
		return ratio
	default:
		return besselHankel(4, 1/z) / besselHankel(0, 1/z)
	}
}

// besselKScaled returns e^z K₀(z) and K₁(z)/K₀(z) for |arg z| ≤ π/4, z ≠ 0.
func besselKScaled(z complex128) (k0, ratio complex128) {
	switch r := cmplx.Abs(z); {
	case r <= besselNear:
		k0, k1 := besselKSeries(z)
		return k0 * cmplx.Exp(z), k1 / k0
	case r <= besselFar:
		s, ratio := besselKFraction(z)
		return cmplx.Sqrt(math.Pi/2/z) / s, ratio
	default:
		p := besselHankel(0, 1/z)
		return cmplx.Sqrt(math.Pi/2/z) * p, besselHankel(4, 1/z) / p
	}
}

// besselKSeries returns K₀(z) and K₁(z) by the power series, the latter through
// the Wronskian I₀K₁ + I₁K₀ = 1/z: I₀ has no zero in the sector.
func besselKSeries(z complex128) (k0, k1 complex128) {
	t := z * z / 4
	var i0, i1, sum complex128 = 1, 1, 0
	var term complex128 = 1
	harmonic := 0.0
	for k := 1.0; k < 60; k++ {
		term = besselScale(term*t, 1/(k*k))
		harmonic += 1 / k
		i0 += term
		i1 += besselScale(term, 1/(k+1))
		sum += besselScale(term, harmonic)
		if besselSize(term)*harmonic < besselEps {
			break
		}
	}
	k0 = sum - (cmplx.Log(z/2)+eulerGamma)*i0
	k1 = (1/z - z/2*i1*k0) / i0
	return k0, k1
}

// besselKFraction returns s and K₁/K₀, where K₀(z) = √(π/(2z)) e^{−z}/s.
func besselKFraction(z complex128) (s, ratio complex128) {
	const a1 = 0.25 // ¼ − ν² with ν = 0
	b := 2 * (1 + z)
	d := besselInverse(b)
	h, step := d, d
	q := complex(a1, 0)
	var q1, q2 complex128 = 0, 1
	a, c := -a1, a1
	s = 1 + q*step
	for i := 2.0; i < 500; i++ {
		a -= 2 * (i - 1)
		c = -a * c / i
		next := besselScale(q1-b*q2, 1/a)
		q1, q2 = q2, next
		q += besselScale(next, c)
		b += 2
		d = besselInverse(b + besselScale(d, a))
		step *= b*d - 1
		h += step
		ds := q * step
		s += ds
		if besselSize(ds) < 1e-17*besselSize(s) {
			break
		}
	}
	return s, (z + 0.5 - complex(a1, 0)*h) / z
}

// besselHankel sums Σ a_k w^k with a_k = Π_{j≤k} (m − (2j−1)²)/(8j) and
// m = 4ν²: with w = 1/z the expansion of K_ν √(2z/π) e^z, with w = −1/z that of
// the dominant part of I_ν √(2πz) e^{−z}.
func besselHankel(m float64, w complex128) complex128 {
	var sum, term complex128 = 1, 1
	last := math.Inf(1)
	for k := 1.0; k < 60; k++ {
		odd := 2*k - 1
		term = besselScale(term*w, (m-odd*odd)/(8*k))
		size := besselSize(term)
		if size >= last {
			break
		}
		sum += term
		if size < besselEps {
			break
		}
		last = size
	}
	return sum
}

// besselISeries returns I₀(z), I₁(z) and I₂(z) by the power series.
func besselISeries(z complex128) (i0, i1, i2 complex128) {
	t := z * z / 4
	var term complex128 = 1
	i0, i1, i2 = 1, 1, 0.5
	for k := 1.0; k < 200; k++ {
		term = besselScale(term*t, 1/(k*k))
		i0 += term
		u := besselScale(term, 1/(k+1))
		i1 += u
		i2 += besselScale(u, 1/(k+2))
		if besselSize(term) < besselEps*besselSize(i0) {
			break
		}
	}
	return i0, i1 * z / 2, i2 * t
}

// besselIFar returns I₀ and I₁ over e^z/√(2πz) beyond besselFar. The recessive
// part is kept: next to the leading one it is exp(−2 Re z), 1e-11 at besselFar
// on arg z = π/4. Its sign is that of the upper half plane, the mirror image below.
func besselIFar(z complex128) (i0, i1 complex128) {
	i0, i1 = besselHankel(0, -1/z), besselHankel(4, -1/z)
	if real(z) > 20 {
		return i0, i1
	}
	turn := complex(0, math.Copysign(1, imag(z))) * cmplx.Exp(-2*z)
	return i0 + turn*besselHankel(0, 1/z), i1 - turn*besselHankel(4, 1/z)
}

// besselIScaled returns e^{−z} I₀(z), I₁(z)/I₀(z) and I₂(z)/I₀(z), |arg z| ≤ π/4.
func besselIScaled(z complex128) (i0, ratio1, ratio2 complex128) {
	if cmplx.Abs(z) <= besselFar {
		a, b, c := besselISeries(z)
		return a * cmplx.Exp(-z), b / a, c / a
	}
	a, b := besselIFar(z)
	ratio1 = b / a
	return a / cmplx.Sqrt(2*math.Pi*z), ratio1, 1 - 2*ratio1/z
}

// besselIRatios returns I₁(z)/I₀(z) and I₂(z)/I₀(z), |arg z| ≤ π/4.
func besselIRatios(z complex128) (ratio1, ratio2 complex128) {
	if cmplx.Abs(z) <= besselFar {
		a, b, c := besselISeries(z)
		return b / a, c / a
	}
	a, b := besselIFar(z)
	ratio1 = b / a
	return ratio1, 1 - 2*ratio1/z
}
