package canon

import (
	"math"
	"math/cmplx"
)

// beamCorrelation is the autocorrelation R(ξ) = ∫φ(x)φ(x+ξ) dx, x from 0 to 1−ξ, of
// a beam's mode shape with mean square 1, in closed form:
// R = (t₀(1−ξ) + t₁) cos βξ + t₂ sin βξ + (n₀ + n₁(1−ξ)) e^(−βξ) + (f₀ + f₁(1−ξ)) e^(−β(1−ξ)).
type beamCorrelation struct {
	β          float64
	t0, t1, t2 float64
	n0, n1     float64
	f0, f1     float64
	sine       bool // no exponentials
}

// newBeamCorrelation integrates the products of T = A cos βx + B sin βx and of the
// two exponentials term by term; with E = e^(−βx) the mixed ones follow from
// d/dx[E (βT + T′)] = −2β² E T. A prime stands for the derivative over β.
func newBeamCorrelation(f *beamFunction) beamCorrelation {
	sin, cos := math.Sincos(f.β)
	e := math.Exp(-f.β)
	quarter := 1 / (4 * f.β)
	half := 1 / (2 * f.β)
	difference, cross := f.A*f.A-f.B*f.B, 2*f.A*f.B
	sin2, cos2 := 2*sin*cos, 1-2*sin*sin
	start, startSlope := f.A, f.B
	end, endSlope := f.A*cos+f.B*sin, f.B*cos-f.A*sin
	return beamCorrelation{
		β:  f.β,
		t0: 0.5 * (f.A*f.A + f.B*f.B),
		t1: quarter*(difference*sin2-cross*cos2+cross) +
			half*(f.C*(start+startSlope-e*(end+endSlope))+f.D*(end-endSlope-e*(start-startSlope))),
		t2: -quarter*(difference*cos2+cross*sin2+difference) +
			half*(f.C*(startSlope-start-e*(end-endSlope))-f.D*(end+endSlope+e*(start+startSlope))),
		n0:   half * (f.C*f.C + f.D*f.D + f.C*(start+startSlope) + f.D*(end-endSlope)),
		n1:   f.C * f.D * e,
		f0:   half * (-e*(f.C*f.C+f.D*f.D) - f.C*(end+endSlope) - f.D*(start-startSlope)),
		f1:   f.C * f.D,
		sine: f.C == 0 && f.D == 0,
	}
}

func (r *beamCorrelation) at(ξ float64) float64 {
	sin, cos := math.Sincos(r.β * ξ)
	left := 1 - ξ
	v := (r.t0*left+r.t1)*cos + r.t2*sin
	if r.sine {
		return v
	}
	return v + (r.n0+r.n1*left)*math.Exp(-r.β*ξ) + (r.f0+r.f1*left)*math.Exp(-r.β*left)
}

// power is |∫φ e^(−ikx) dx|² of a mode shape. The trigonometric part is written
// with sin(q/2)/(q/2), which is regular where k meets β.
func (f *beamFunction) power(k float64) float64 {
	if f.C == 0 && f.D == 0 { // sine: |1 − (−1)ⁿe^(−ik)| = 2|sin((k − nπ)/2)|
		v := f.B * f.β / (k + f.β) * sincHalf(k-f.β)
		return v * v
	}
	end := cmplx.Exp(complex(0, -k))
	decay := complex(math.Exp(-f.β), 0)
	sum := 0.5 * complex(f.A, -f.B) * halfPhase(f.β-k)
	sum += 0.5 * complex(f.A, f.B) * halfPhase(-f.β-k)
	sum += complex(f.C, 0) * (1 - decay*end) / complex(f.β, k)
	sum += complex(f.D, 0) * (end - decay) / complex(f.β, -k)
	return real(sum)*real(sum) + imag(sum)*imag(sum)
}

// halfPhase is ∫e^(iqx) dx over 0 to 1.
func halfPhase(q float64) complex128 {
	sin, cos := math.Sincos(0.5 * q)
	s := sincHalf(q)
	return complex(cos*s, sin*s)
}

// sincHalf is sin(q/2)/(q/2).
func sincHalf(q float64) float64 {
	h := 0.5 * q
	if math.Abs(h) < 1e-4 {
		return 1 - h*h/6
	}
	return math.Sin(h) / h
}

// baffledKey are the arguments of BaffledPlateMode.
type baffledKey struct {
	x, y       BeamSupport
	aspect, k0 float64
	m, n       int
}

type baffledAnswer struct{ mass, resistance float64 }

var baffledModes = newSolvedMemo[baffledKey, baffledAnswer](4096)

// longestSound bounds the wave number times the longer side, for the time it takes.
const longestSound = 120

// BaffledPlateMode returns the fluid loading of a mode of a rectangular plate in a
// rigid plane baffle, on one side.
//
// Equation: Z/∫W²dA = ρc·r̂ + iω·μ̂ρa with, R_x and R_y the autocorrelations of the
// shape W = X(x)Y(y) along x and y and r the distance,
// μ̂ a ∫W²dA = (2/π)∫₀ᵃ∫₀ᵇ R_x R_y cos(k₀r)/r dη dξ (Rayleigh's integral) and
// r̂ ∫W²dA = (k₀²/4π²)∫∫ |X̂(k₀ sinθ cosφ)|²|Ŷ(k₀ sinθ sinφ)|² sinθ dθ dφ over the
// hemisphere. The pole 1/r goes with ξ = u, η = u sinh t: dξ dη/r = du dt.
//
// Symbols: μ̂ added mass per area over ρa, so that the added mass ratio of the mode
// is μ̂ ρa/(ρ_s h), twice that for two sides; r̂ radiation resistance per area over
// ρc; ρ [kg/m³] and c [m/s] of the fluid, a and b sides along x and y [m], aspect
// a/b, X and Y beam modes m and n with the supports edgesX at x = 0 and a, edgesY
// at y = 0 and b, k₀ = ω/c; k0a = 0: incompressible.
//
// Range: aspect from 0.1 to 10; m, n from 1 to 10; k0a from 0 to 60 and k0b to 120.
// Free edges: as if the gap to the baffle were closed.
//
// Accuracy: 1e-6 of the loading of a piston (ρa or ρc) for the product of beam
// modes, which is the plate's own shape if simply supported.
//
// Check: pinned square, (1, 1), k0a = 0: μ̂ = 0.40950; high modes μ̂ → 1/(k_b a);
// k0a → 0, m and n odd: r̂ = 32 k₀²ab/(π⁵m²n²); k₀ ≫ k_b: r̂ → 1.
//
// Source: Wallace 1972 (from memory).
func BaffledPlateMode(edgesX, edgesY BeamSupport, aspect float64, m, n int, k0a float64) (mass, resistance float64, err error) {
	const name = "BaffledPlateMode"
	for _, err := range [...]error{
		checkSupport(name, "edgesX", edgesX),
		checkSupport(name, "edgesY", edgesY),
		inRange(name, "aspect", aspect, 0.1, 10),
		inRange(name, "m", float64(m), 1, plateModeLimit),
		inRange(name, "n", float64(n), 1, plateModeLimit),
		inRange(name, "k0a", k0a, 0, math.Min(60, longestSound*aspect)),
	} {
		if err != nil {
			return 0, 0, err
		}
	}
	key := baffledKey{x: edgesX, y: edgesY, aspect: aspect, m: m, n: n, k0: k0a}
	a := baffledModes.of(key, func() baffledAnswer { return solveBaffledPlate(key) })
	return a.mass, a.resistance, nil
}

func solveBaffledPlate(k baffledKey) baffledAnswer {
	x, y := newBeamFunction(k.x, k.m), newBeamFunction(k.y, k.n)
	b := 1 / k.aspect
	return baffledAnswer{
		mass:       baffledMass(&x, &y, b, k.k0, 1),
		resistance: baffledResistance(&x, &y, b, k.k0, 1),
	}
}

// baffledUncertainty is twice the change of either value, in units of ρa and ρc,
// that half as many nodes again make.
func baffledUncertainty(k baffledKey, a baffledAnswer) float64 {
	x, y := newBeamFunction(k.x, k.m), newBeamFunction(k.y, k.n)
	b := 1 / k.aspect
	mass := math.Abs(baffledMass(&x, &y, b, k.k0, 1.5) - a.mass)
	return 2*max(mass, math.Abs(baffledResistance(&x, &y, b, k.k0, 1.5)-a.resistance)) + 1e-15
}

// baffledMass is μ̂ for sides 1 and b: over the triangle below the diagonal with
// ξ = u, η = u sinh t, and over the one above with the roles exchanged. A
// correlation along y over the norm of Y makes b/b.
func baffledMass(x, y *beamFunction, b, k0, refine float64) float64 {
	rx, ry := newBeamCorrelation(x), newBeamCorrelation(y)
	below := correlationTriangle(&rx, &ry, 1, b, k0, refine)
	above := correlationTriangle(&ry, &rx, b, 1, k0, refine)
	return 2 / math.Pi * (below + above)
}

// correlationTriangle is ∫∫ p(u/p₀) q(u sinh t/q₀) cos(k₀u cosh t) dt du over
// 0 ≤ u ≤ p₀, 0 ≤ sinh t ≤ q₀/p₀, with as many nodes as the phase asks for.
func correlationTriangle(p, q *beamCorrelation, p0, q0, k0, refine float64) float64 {
	ratio := q0 / p0
	diagonal := math.Hypot(p0, q0)
	top := math.Asinh(ratio)
	phaseU := p.β + q.β + k0*diagonal
	phaseT := top * (q.β*diagonal/q0 + k0*q0)
	ru := legendreRuleFor(int(refine * (10 + 0.5*phaseU)))
	rt := legendreRuleFor(int(refine * (8 + 0.5*phaseT)))
	sum := 0.0
	for i, t := range rt.x {
		sinh, cosh := math.Sinh(top*t), math.Cosh(top*t)
		line := 0.0
		for j, u := range ru.x {
			v := p.at(u) * q.at(u*sinh/ratio)
			if k0 > 0 {
				v *= math.Cos(k0 * p0 * u * cosh)
			}
			line += ru.w[j] * v
		}
		sum += rt.w[i] * line
	}
	return sum * top * p0
}

// baffledResistance is r̂ for sides 1 and b: the power spectrum over the
// hemisphere of directions, of which a quarter suffices.
func baffledResistance(x, y *beamFunction, b, k0, refine float64) float64 {
	if k0 == 0 {
		return 0
	}
	nodes := int(refine * (10 + 0.8*k0*math.Hypot(1, b)))
	rθ := legendreRuleFor(nodes)
	rφ := legendreRuleFor(nodes)
	sum := 0.0
	for i, u := range rθ.x {
		sinθ := math.Sin(0.5 * math.Pi * u)
		line := 0.0
		for j, v := range rφ.x {
			sinφ, cosφ := math.Sincos(0.5 * math.Pi * v)
			line += rφ.w[j] * x.power(k0*sinθ*cosφ) * y.power(k0*b*sinθ*sinφ)
		}
		sum += rθ.w[i] * sinθ * line
	}
	// Four quarters of (π/2)² over 4π²; |Ŷ|² over ∫Y² makes b²/b.
	return 0.25 * k0 * k0 * b * sum
}

// CavityStiffness returns the share of a closed shallow cavity's stiffness that a
// mode of a rectangular plate feels.
//
// Equation: s = (mean W)²/(mean W²), W = X(x)Y(y); the cavity adds ρc²/d·s to the
// stiffness per area of the mode.
//
// Symbols: X and Y beam modes m and n with the supports edgesX and edgesY, ρ density
// [kg/m³] and c speed of sound [m/s] in the cavity, d its depth [m], small against
// the wave length and the sides.
//
// Range: m, n from 1 to 100 000.
//
// Accuracy: 1e-12 for the product of beam modes.
//
// Check: pinned, (1, 1): 64/π⁴ = 0.65702; even modes between like supports: 0.
//
// Source: Blevins 1979, table 8-1 for the mode shapes (from memory).
func CavityStiffness(edgesX, edgesY BeamSupport, m, n int) (float64, error) {
	const name = "CavityStiffness"
	for _, err := range [...]error{
		checkSupport(name, "edgesX", edgesX),
		checkSupport(name, "edgesY", edgesY),
		inRange(name, "m", float64(m), 1, beamModeLimit),
		inRange(name, "n", float64(n), 1, beamModeLimit),
	} {
		if err != nil {
			return 0, err
		}
	}
	x, y := newBeamFunction(edgesX, m), newBeamFunction(edgesY, n)
	mean := x.mean(edgesX, m) * y.mean(edgesY, n)
	return mean * mean, nil
}
