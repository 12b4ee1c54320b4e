package canon

import "math"

const (
	oscillationMinR = 1e-12
	oscillationMaxR = 1e18
)

// viscousRoot returns √(iR) for R ≥ 0.
func viscousRoot(r float64) complex128 {
	s := math.Sqrt(r / 2)
	return complex(s, s)
}

// OscillatingCylinder gives the force on a circular cylinder that oscillates
// across its axis, with a small amplitude, in unbounded viscous fluid.
//
//	Γ = Γr − iΓi = 1 + 4K₁(z)/(z K₀(z)), z = √(iR), R = ωa²/ν
//
// ω the circular frequency (rad/s), a the radius (m), ν the kinematic viscosity
// (m²/s). The force per length is −Γ ρπa² dU/dt: added mass Γr ρπa² (kg/m),
// damping constant Γi ωρπa² (N s/m²), ρ the density (kg/m³).
//
// Range: R from 1e-12 to 1e18. Accuracy: 1e-12 of each part.
// Check value: R = 1 gives 3.96801484714 and 4.56657056633. With δ = √(2ν/ω) the
// limit R → ∞ is 1 + 2δ/a − i(2δ/a)(1 + δ/(2a)).
//
// Source: Stokes 1851, part I section III; Rosenhead 1963, chapter VII
// (from memory).
func OscillatingCylinder(r float64) (gammaR, gammaI float64, err error) {
	if err := inRange("OscillatingCylinder", "R", r, oscillationMinR, oscillationMaxR); err != nil {
		return 0, 0, err
	}
	g := oscillatingCylinder(r)
	return real(g), -imag(g), nil
}

func oscillatingCylinder(r float64) complex128 {
	z := viscousRoot(r)
	return 1 + 4*besselKRatio(z)/z
}

// OscillatingSphere gives the force on a sphere that oscillates with a small
// amplitude in unbounded viscous fluid, per displaced mass of fluid.
//
//	added mass/(ρV) = ½ + (9/4)(δ/a)
//	damping/(ωρV)   = (9/4)(δ/a)(1 + δ/a), δ/a = √(2/R), R = ωa²/ν
//
// a the radius (m), ω the circular frequency (rad/s), ν the kinematic viscosity
// (m²/s), ρV = ρ(4/3)πa³ the displaced mass (kg). The factor Γ on the ideal added
// mass ρV/2 is twice these: Γr = 2·addedMass, Γi = 2·damping.
//
// Range: R from 1e-12 to 1e18. Accuracy: that of the machine; the formula is
// exact for the linearised equations.
// Check value: R = 1 gives 3.68198051534 and 7.68198051534. Limits: R → ∞ ½;
// R → 0 the damping constant 6πρνa of steady creeping flow.
//
// Source: Stokes 1851, part I section II; Landau & Lifshitz 1987, §24 problem 5 (from
// memory).
func OscillatingSphere(r float64) (addedMass, damping float64, err error) {
	if err := inRange("OscillatingSphere", "R", r, oscillationMinR, oscillationMaxR); err != nil {
		return 0, 0, err
	}
	layer := math.Sqrt(2 / r)
	return 0.5 + 2.25*layer, 2.25 * layer * (1 + layer), nil
}

const (
	ribbonMinR = 1e-6
	ribbonMaxR = 1e4
)

// Coefficients of Sader 1998, eq. 21, in rising powers of log₁₀R.
var (
	ribbonRealAbove = [...]float64{0.91324, -0.48274, 0.46842, -0.12886, 0.044055, -0.0035117, 0.00069085}
	ribbonRealBelow = [...]float64{1, -0.56964, 0.48690, -0.13444, 0.045155, -0.0035862, 0.00069085}
	ribbonImagAbove = [...]float64{-0.024134, -0.029256, 0.016294, -0.00010961, 0.000064577, -0.000044510}
	ribbonImagBelow = [...]float64{1, -0.59702, 0.55182, -0.18357, 0.079156, -0.014369, 0.0028361}
)

// OscillatingRibbon gives the force on a thin ribbon that oscillates across its
// faces in unbounded viscous fluid.
//
//	Γ = Γr − iΓi = Ω*(R) Γc(R), R = ωb²/(4ν)
//
// Γc is OscillatingCylinder at R; Ω = Ωr + iΩi are two rational functions of
// log₁₀R fitted for e^{−iωt}, conjugated here. b the width (m), ω the circular
// frequency (rad/s), ν the kinematic viscosity (m²/s). The ideal added mass is
// ρπb²/4 per length (kg/m).
//
// Range: R from 1e-6 to 1e4. Accuracy: the fit lies within 0.1 % of the numbers
// of Tuck 1969, as its author says (from memory).
// Check value: R = 10 gives 1.91831810625 and 0.981621970169. Limit: R → ∞ 1.
//
// Source: Sader 1998, eqs 20 to 22 (from memory).
func OscillatingRibbon(r float64) (gammaR, gammaI float64, err error) {
	if err := inRange("OscillatingRibbon", "R", r, ribbonMinR, ribbonMaxR); err != nil {
		return 0, 0, err
	}
	tau := math.Log10(r)
	re := ribbonPolynomial(ribbonRealAbove[:], tau) / ribbonPolynomial(ribbonRealBelow[:], tau)
	im := ribbonPolynomial(ribbonImagAbove[:], tau) / ribbonPolynomial(ribbonImagBelow[:], tau)
	g := complex(re, -im) * oscillatingCylinder(r)
	return real(g), -imag(g), nil
}

func ribbonPolynomial(c []float64, x float64) float64 {
	sum := 0.0
	for i := len(c) - 1; i >= 0; i-- {
		sum = sum*x + c[i]
	}
	return sum
}

// PulsatileTube gives the pulsating flow of a viscous fluid in a rigid tube,
// as its ratio to the flow of a fluid without viscosity under the same pressure
// gradient.
//
//	1 − F₁₀ = 1 − 2J₁(z)/(z J₀(z)) = I₂(w)/I₀(w), z = i^{3/2}α, w = √(iα²), α = a√(ω/ν)
//
// a the inner radius (m), ω the circular frequency (rad/s), ν the kinematic
// viscosity (m²/s); for e^{+iωt} the mean velocity is (1 − F₁₀)/(iωρ) times minus
// the pressure gradient. The result is the real and the imaginary part, both ≥ 0.
//
// Range: α from 0 to 1e8. Accuracy: 1e-12 of each part.
// Check value: α = 3 gives 0.500989702414 and 0.359962839122. Limits: α → 0
// α⁴/48 + iα²/8; α → ∞ 1.
//
// Source: Womersley 1955, J. Physiol. 127, 553–563 (from memory).
func PulsatileTube(alpha float64) (re, im float64, err error) {
	if err := inRange("PulsatileTube", "alpha", alpha, 0, 1e8); err != nil {
		return 0, 0, err
	}
	if alpha > besselFar {
		w := viscousRoot(alpha * alpha)
		ratio, _ := besselIRatios(w)
		g := 1 - 2*ratio/w
		return real(g), imag(g), nil
	}
	g := pulsatileNear(alpha * alpha)
	return real(g), imag(g), nil
}

// pulsatileNear evaluates I₂/I₀ = u/(8 + u + 2s), u = w² = ia2, s = wI₃/I₂ by the
// continued fraction of that ratio. Real and imaginary part then hold the even
// and odd powers of a2 apart, so that neither drowns in the other as α → 0.
func pulsatileNear(a2 float64) complex128 {
	u := complex(0, a2)
	var s complex128
	for n := 6 + 2*(12+int(math.Sqrt(a2))); n >= 6; n -= 2 {
		s = u / (complex(float64(n), 0) + s)
	}
	return u / (8 + u + 2*s)
}
