package canon

import "math"

// StringMode returns the dimensionless frequency of a taut string or a cable of
// small sag.
//
// Equation: ω L √(m/T) = nπ; with sag, the modes of odd n, which stretch the
// cable, obey tan(ω̄/2) = ω̄/2 − (4/λ²)(ω̄/2)³, ω̄ = ω L √(m/T).
//
// Symbols: T tension [N], m mass per length [kg/m], L span [m], n half waves;
// λ² = (mgL cos θ/T)²·(E A L)/(T L_e), Irvine's parameter [-], g gravity [m/s²],
// θ inclination of the chord, EA axial stiffness [N], L_e ≈ L stretched length [m].
//
// Range: n from 1 to 100 000; λ² from 0 (no sag) to 1e6, sag below 1/8 of the span.
//
// Accuracy: 1e-12 of the linear theory.
//
// Check: λ² = 4π²: n = 1 gives 2π; λ² → ∞: 2.861π.
//
// Source: Irvine & Caughey 1974 (from memory).
func StringMode(n int, sag float64) (float64, error) {
	const name = "StringMode"
	if err := inRange(name, "n", float64(n), 1, beamModeLimit); err != nil {
		return 0, err
	}
	if err := inRange(name, "sag", sag, 0, 1e6); err != nil {
		return 0, err
	}
	if n%2 == 0 || sag == 0 {
		return float64(n) * math.Pi, nil
	}
	return 2 * sagRoot(n, sag), nil
}

// sagRoot solves sin x = (x − 4x³/λ²) cos x between nπ/2 and (n+2)π/2. With
// x = nπ/2 + d both sides are divided by sin nπ/2: cos d + (x − 4x³/λ²) sin d = 0,
// positive at d = 0 and negative at d = π.
func sagRoot(n int, sag float64) float64 {
	base := float64(n) * math.Pi / 2
	lo, hi := 0.0, math.Pi
	d := 0.5 * math.Pi
	for range 200 {
		x := base + d
		sin, cos := math.Sincos(d)
		q := x - 4*x*x*x/sag
		f := cos + q*sin
		if f > 0 {
			lo = d
		} else {
			hi = d
		}
		slope := -sin + q*cos + (1-12*x*x/sag)*sin
		next := d - f/slope
		if !(next > lo && next < hi) {
			next = 0.5 * (lo + hi)
		}
		if math.Abs(next-d) <= 1e-15*d {
			return base + next
		}
		d = next
	}
	return base + d
}

// RingMode returns the dimensionless frequency of in-plane bending of a thin ring.
//
// Equation: ω R² √(m/EI) = n(n² − 1)/√(n² + 1), the centre line not stretched.
//
// Symbols: R mean radius [m], EI bending stiffness in the plane of the ring
// [N m²] (for a long tube E h³/(12(1−ν²)) per length), m mass per length of the
// ring [kg/m], n waves round the circumference.
//
// Range: n from 2 to 1000, thickness well below R/n.
//
// Accuracy: exact for the inextensible ring; a thick one lies lower by the order
// of (nh/R)²/12, h the thickness.
//
// Check: n = 2: 6/√5 = 2.6833; n = 3: 24/√10 = 7.5895.
//
// Source: Love 1927, section 293 (from memory).
func RingMode(n int) (float64, error) {
	if err := inRange("RingMode", "n", float64(n), 2, 1000); err != nil {
		return 0, err
	}
	x := float64(n)
	return x * (x*x - 1) / math.Sqrt(x*x+1), nil
}

// TubeEnds says whether a long tube may change its length as it breathes.
type TubeEnds int

// The ends of a breathing tube.
const (
	AxiallyFree TubeEnds = iota // plane stress: no axial force
	AxiallyHeld                 // plane strain: no axial strain
)

var tubeEndNames = []string{"axially-free", "axially-held"}

// BreathingTube returns the dimensionless frequency of the axisymmetric radial
// motion of a thin tube or ring.
//
// Equation: ω R √(ρ/E) = 1 axially free, 1/√(1 − ν²) axially held.
//
// Symbols: R mean radius [m], ρ density [kg/m³], E Young's modulus [Pa], ν
// Poisson's ratio [-].
//
// Range: ν from 0 to 0.5; thickness below R/10, axial wave length above 10 R.
//
// Accuracy: exact for the membrane; relative error about h²/(24R²) from bending.
//
// Check: held, ν = 0.3: 1.04828.
//
// Source: Love 1927, section 293; Blevins 1979, table 12-1 (from memory).
func BreathingTube(ends TubeEnds, nu float64) (float64, error) {
	const name = "BreathingTube"
	if ends != AxiallyFree && ends != AxiallyHeld {
		return 0, &RangeError{Function: name, Arg: "ends", Value: float64(ends), Reason: "want axially-free or axially-held"}
	}
	if err := inRange(name, "nu", nu, 0, 0.5); err != nil {
		return 0, err
	}
	if ends == AxiallyFree {
		return 1, nil
	}
	return 1 / math.Sqrt(1-nu*nu), nil
}
