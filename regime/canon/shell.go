package canon

import (
	"math"
	"math/cmplx"
)

const (
	shellMinRatio = 1 + 1e-6
	shellMaxRatio = 1e6
	shellMinR     = 1e-8
	shellMaxR     = 1e16

	shellNarrow  = 1.5 // radius ratio up to which the gap series may serve
	shellGapThin = 3   // |λ|(q−1) up to which it does
	shellWide    = 4   // |λ|q up to which the series in λ² serves
)

// CylinderInShell gives the force on a circular cylinder that oscillates across
// its axis, with an amplitude small against the gap, in viscous fluid inside a
// fixed concentric shell.
//
//	ψ = (A₁r + A₂/r + A₃I₁(λr) + A₄K₁(λr)) sin θ, λ² = iω/ν, no slip on both walls
//	Γ = Γr − iΓi = 2A₂/(Ua²) − 1
//	  = 2q²X/(4/λ² + (q²−1)Y − (2/λ)Z) − 1 (λ in units of 1/a)
//	X = I₂(λq)K₂(λ) − K₂(λq)I₂(λ), Y = I₂(λq)K₀(λ) − K₂(λq)I₀(λ)
//	Z = I₁(λq)K₀(λ)/q + I₀(λq)K₁(λ) + I₁(λ)K₀(λq) + I₀(λ)K₁(λq)/q
//
// R = ωa²/ν with a the radius of the cylinder (m), ω the circular frequency
// (rad/s), ν the kinematic viscosity (m²/s); q = b/a > 1 with b the radius of the
// shell (m). Γ multiplies the ideal added mass ρπa² of the free cylinder (kg/m):
// added mass Γr ρπa², damping constant Γi ωρπa² (N s/m²).
//
// Range: R from 1e-8 to 1e16, q from 1.000001 to 1e6. Accuracy: 1e-9 of each part.
// Check value: R = 1000, q = 1.5 gives 2.969028545 and 0.443900287693. Limits:
// R → ∞ (q²+1)/(q²−1); q → ∞ OscillatingCylinder; thin film in a narrow gap
// h = q−1, Rh² → 0: Γr = 6/(5h), Γi = 12/(Rh³).
//
// Source: Chen, Wambsganss & Jendrzejczyk 1976; Fritz 1972 for the ideal fluid
// (from memory).
func CylinderInShell(r, q float64) (gammaR, gammaI float64, err error) {
	if err := inRange("CylinderInShell", "R", r, shellMinR, shellMaxR); err != nil {
		return 0, 0, err
	}
	if err := inRange("CylinderInShell", "q", q, shellMinRatio, shellMaxRatio); err != nil {
		return 0, 0, err
	}
	root, h := math.Sqrt(r), q-1
	var g complex128
	switch {
	case q <= shellNarrow && root*h <= shellGapThin:
		g = shellGapSeries(r, h)
	case q > shellNarrow && root*q <= shellWide:
		g = shellPowerSeries(r, q)
	default:
		g = shellGeneral(r, q)
	}
	return real(g), -imag(g), nil
}

// How the coefficients give one quotient. Let g be the part of the radial
// function f with I₁ and K₁, so that f'' + f'/r − f/r² = λ²g. Green's identity
// with r and with 1/r, the potential flows, and f = f' = 0 on the shell,
// f = f' = 1 on the cylinder (a = U = 1), gives
//
//	∫g dr = −2/λ², ∫r²g dr = 0 over the gap, Γ + 1 = 2A₂ = g'(1) − g(1)
//
// Two numbers remain to be found, not four. Real and imaginary part of Γ may
// differ by many orders: thin film damping grows as 1/R while the added mass
// stays. So the series below keep the even and odd powers of iR apart, which
// complex arithmetic does by itself as long as every factor is a real series in iR.

// shellGapSeries expands g about the middle of the gap, in two solutions whose
// lowest terms are 1 and τ, −1 ≤ τ ≤ 1 across the gap. Nothing cancels as h → 0.
func shellGapSeries(r, h float64) complex128 {
	middle, half := 1+h/2, h/2
	eps := half / middle
	x2 := complex(0, r*half*half)
	a := shellGapSolution(1, 0, eps, x2)
	b := shellGapSolution(0, 1, eps, x2)
	e := complex(eps, 0)
	det := a.mean*b.moment - b.mean*a.moment
	// The two conditions, solved up to the common factor 2/(λ²·half·eps).
	alpha := -(b.mean + e*b.moment)
	beta := a.mean + e*a.moment
	s := (alpha*a.jump(half) + beta*b.jump(half)) / det
	scale := 2 / (r * half * eps)
	return complex(imag(s)*scale, -real(s)*scale) - 1
}

// shellGapPart holds one solution of the gap series: its integral over τ, its
// integral with the weight 2τ + eps·τ², and value and slope (per τ) at τ = −1.
type shellGapPart struct {
	mean, moment, value, slope complex128
}

// jump is g' − g on the cylinder, with g' the slope in r.
func (p shellGapPart) jump(half float64) complex128 {
	return p.slope*complex(1/half, 0) - p.value
}

// shellGapSolution sums the Taylor series with the given first coefficients.
// With y = eps·τ the equation is (1+y)²g” + (1+y)g' − g = (λ·middle)²(1+y)²g.
func shellGapSolution(c0, c1, eps float64, x2 complex128) shellGapPart {
	var p shellGapPart
	var c [4]complex128 // c[3] the newest: coefficients n−2 … n+1
	c[2], c[3] = complex(c0, 0), complex(c1, 0)
	e1, e2 := complex(2*eps, 0), complex(eps*eps, 0)
	p.add(0, eps, c[2])
	p.add(1, eps, c[3])
	small := 0
	for n := 0.0; n < 200 && small < 4; n++ {
		next := x2*(c[2]+e1*c[1]+e2*c[0]) -
			complex(eps*(n+1)*(2*n+1), 0)*c[3] -
			complex(eps*eps*(n*n-1), 0)*c[2]
		next *= complex(1/((n+1)*(n+2)), 0)
		c[0], c[1], c[2], c[3] = c[1], c[2], c[3], next
		p.add(int(n)+2, eps, next)
		if shellTiny(next, x2) {
			small++
		} else {
			small = 0
		}
	}
	return p
}

// shellTiny tells whether a coefficient no longer counts, the imaginary part
// against the size |x2| that imaginary parts have when x2 is small.
func shellTiny(c, x2 complex128) bool {
	return math.Abs(real(c)) < 1e-18 && math.Abs(imag(c)) < 1e-18*math.Min(1, imag(x2))
}

// add takes coefficient n into the four sums.
func (p *shellGapPart) add(n int, eps float64, c complex128) {
	k := float64(n)
	if n%2 == 0 {
		p.mean += complex(2/(k+1), 0) * c
		p.moment += complex(2*eps/(k+3), 0) * c
		p.value += c
		p.slope -= complex(k, 0) * c
		return
	}
	p.moment += complex(4/(k+2), 0) * c
	p.value -= c
	p.slope += complex(k, 0) * c
}

// shellSeries holds, at one radius, the Bessel functions of λr as power series
// in s = λ²/4, with K₀ and K₂ replaced by their sums with ln(λ/2)+γ times I₀ and
// I₂, which is what remains of them in every difference that counts.
type shellSeries struct {
	i0 complex128 // (I₀ − 1)/s
	i2 complex128 // I₂/s
	k0 complex128 // K₀ + (ln(λ/2)+γ)I₀
	k2 complex128 // K₂ + (ln(λ/2)+γ)I₂ − 1/(2sr²)
}

func shellSeriesAt(s complex128, radius float64) shellSeries {
	r2 := radius * radius
	t := s * complex(r2, 0)
	var term complex128 = 1       // tᵏ/k!²
	var i0, k0 complex128         // without the factor r², without the logarithm
	var i2 complex128 = 0.5       // Σ tᵏ/(k!(k+2)!)
	var k2 complex128 = 0.5 * 1.5 // Σ (H_k + H_{k+2}) tᵏ/(k!(k+2)!)
	harmonic := 0.0
	for k := 1.0; k < 80; k++ {
		before := term * complex(1/(k*k), 0)
		i0 += before
		term = before * t
		harmonic += 1 / k
		k0 += complex(harmonic, 0) * term
		u := term * complex(1/((k+1)*(k+2)), 0)
		i2 += u
		k2 += complex(2*harmonic+1/(k+1)+1/(k+2), 0) * u
		if harmonic*besselSize(before) < besselEps {
			break
		}
	}
	log := complex(math.Log(radius), 0)
	i0 *= complex(r2, 0)
	i2 *= complex(r2, 0)
	return shellSeries{
		i0: i0,
		i2: i2,
		k0: k0 - log*(1+s*i0),
		k2: t*k2/2 - 0.5 - log*s*i2,
	}
}

// shellPowerSeries serves wide gaps at small R.
func shellPowerSeries(r, q float64) complex128 {
	s := complex(0, r/4)
	one, out := shellSeriesAt(s, 1), shellSeriesAt(s, q)
	q2 := complex(q*q, 0)
	cross := out.i2*(0.5+s*one.k2) - one.i2*(0.5/q2+s*out.k2)
	den := (q2*out.i2-one.i2)*(one.k0-out.k0) - (out.i0-one.i0)*(one.k2-q2*out.k2)
	g := 2 * q2 * cross / den
	return complex(imag(g)*4/r, -real(g)*4/r) - 1
}

// shellGeneral evaluates the quotient with every product I(λq)K(λ) taken
// relative to I₀(λq)K₀(λ), so that nothing overflows and the small imaginary
// parts at large R keep their digits. The terms of the far wall, with the decay
// exp(−2λ(q−1)), are dropped where they no longer count.
func shellGeneral(r, q float64) complex128 {
	z := viscousRoot(r)
	zq := z * complex(q, 0)
	h := q - 1
	span := complex(h*(2+h), 0)
	cq := complex(q, 0)
	travel := z * complex(h, 0)
	if real(travel) > 42 {
		i1q, i2q := besselIRatios(zq)
		k1 := besselKRatio(z)
		k2 := 1 + 2*k1/z
		return 2*cq*cq*i2q*k2/(span*i2q-2/z*(i1q/cq+k1)) - 1
	}
	k0, k1 := besselKScaled(z)
	k0q, k1q := besselKScaled(zq)
	i0, i1, i2 := besselIScaled(z)
	i0q, i1q, i2q := besselIScaled(zq)
	k2, k2q := 1+2*k1/z, 1+2*k1q/zq
	lead := i0q * k0
	decay := cmplx.Exp(-travel)
	far := decay * decay * i0 * k0q / lead
	num := 2 * cq * cq * (i2q*k2 - far*i2*k2q)
	den := 4/(z*z)*decay/lead + span*(i2q-far*k2q) - 2/z*(i1q/cq+k1+far*(i1+k1q/cq))
	return num/den - 1
}
