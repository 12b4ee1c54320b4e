package canon

import (
	"math"
	"strings"
)

// LargeAmplitudeKind names a structure whose supports do not move in its plane,
// so that deflection stretches it.
type LargeAmplitudeKind int

// The structures with immovable supports.
const (
	ImmovablePinnedBeam LargeAmplitudeKind = iota
	ImmovableClampedBeam
	ImmovableClampedPinnedBeam
	ImmovableSimplySupportedPlate // rectangular
	ImmovableClampedSquarePlate
	ImmovableClampedCircularPlate
)

var largeAmplitudeNames = []string{
	"pinned-beam", "clamped-beam", "clamped-pinned-beam",
	"simply-supported-plate", "clamped-square-plate", "clamped-circular-plate",
}

// The amplitudes to which the one-mode solutions are good: over the radius of
// gyration for beams, over the thickness for plates.
const (
	largestBeamAmplitude  = 5
	largestPlateAmplitude = 1
)

// clampedSquareStretching is ε/(w/h)² of the clamped square plate with ν = 0.3.
const clampedSquareStretching = 0.370485 / 0.75

// LargeAmplitude returns the ratio of the natural frequency at a finite amplitude
// to that at a small one, first mode.
//
// Equation: the one-mode equation q̈ + q + ε q³ = 0 at unit amplitude solved
// exactly, ω/ω₀ = (π/2)√(1 + ε)/K(k), k² = ε/(2(1 + ε)), K the complete elliptic
// integral; to first order √(1 + ¾ε).
// Beams: ε = (w/r)²(∫φ′²)²/(2∫φ″²), ¼(w/r)² if pinned.
// Simply supported plate: ε = 12(1 − ν²)(w/h)²·[(1 + 2νs² + s⁴)/(8(1 − ν²)) +
// (1 + s⁴)/16]/(1 + s²)², s = a/b, from Airy's function of one half wave.
// Clamped square plate: ¾ε = 0.370485 (w/h)² for ν = 0.3, from the product of
// clamped beam functions with the in-plane displacements that minimise the energy.
// Clamped circular plate: (1 − r²/a²)² with the exact in-plane displacement.
//
// Symbols: ratio = w/r for beams, w amplitude, r radius of gyration of the
// section (h/√12 for a rectangle), w/h for plates, h thickness; aspect s = a/b;
// ν Poisson's ratio.
//
// Range: supports immovable in the plane; w/r from 0 to 5, w/h from 0 to 1; s from
// 0.1 to 10 (simply supported plate; the others ignore it); ν from 0 to 0.5
// (clamped square plate 0.3 only). With edges free to move in plane, and for
// cantilevers, the frequency changes by the square of the slope only.
//
// Accuracy: 1e-12 of the one-mode equation, which is itself good to 2 % for
// pinned and 3 % for clamped supports.
//
// Check: square simply supported plate, ν = 0.3: 1.0195 at w/h = 0.2, 1.402 at 1;
// pinned beam, w/r = 1: 1.0892.
//
// Source: Woinowsky-Krieger 1950; Chu & Herrmann 1956 (from memory).
func LargeAmplitude(kind LargeAmplitudeKind, ratio, aspect, nu float64) (float64, error) {
	const name = "LargeAmplitude"
	if kind < ImmovablePinnedBeam || kind > ImmovableClampedCircularPlate {
		return 0, &RangeError{Function: name, Arg: "kind", Value: float64(kind), Reason: "want one of " + strings.Join(largeAmplitudeNames, ", ")}
	}
	largest := float64(largestPlateAmplitude)
	if kind <= ImmovableClampedPinnedBeam {
		largest = largestBeamAmplitude
	}
	if err := inRange(name, "ratio", ratio, 0, largest); err != nil {
		return 0, err
	}
	if err := inRange(name, "aspect", aspect, 0.1, 10); err != nil {
		return 0, err
	}
	if err := inRange(name, "nu", nu, 0, 0.5); err != nil {
		return 0, err
	}
	if kind == ImmovableClampedSquarePlate && nu != 0.3 {
		return 0, &RangeError{Function: name, Arg: "nu", Value: nu, Reason: "the clamped square plate is known for 0.3 only"}
	}
	return duffingRatio(stretchingCoefficient(kind, aspect, nu) * ratio * ratio), nil
}

// stretchingCoefficient is ε/ratio².
func stretchingCoefficient(kind LargeAmplitudeKind, aspect, nu float64) float64 {
	switch kind {
	case ImmovablePinnedBeam:
		return 0.25
	case ImmovableClampedBeam:
		return beamStretching(ClampedClamped)
	case ImmovableClampedPinnedBeam:
		return beamStretching(ClampedPinned)
	case ImmovableSimplySupportedPlate:
		s2 := aspect * aspect
		s4 := s2 * s2
		uniform := (1 + 2*nu*s2 + s4) / 8
		waves := (1 - nu*nu) * (1 + s4) / 16
		return 12 * (uniform + waves) / ((1 + s2) * (1 + s2))
	case ImmovableClampedSquarePlate:
		return clampedSquareStretching
	}
	return discStretching(nu)
}

// beamStretching is (∫φ′²)²/(2∫φ″²) for max |φ| = 1, where ∫φ″² = β⁴∫φ².
func beamStretching(support BeamSupport) float64 {
	f := newBeamFunction(support, 1)
	peak := f.largest(0)
	slope := f.meanSquareSlope(support)
	return slope * slope / (2 * peak * peak * math.Pow(f.β, 4))
}

// discStretching is ε/(w/h)² for the clamped disc with w = (1 − r²)². The radial
// displacement, from u″ + u′/r − u/r² = −w′w″ − (1−ν)w′²/(2r) and u(1) = 0, is the
// polynomial u = r(c₀ + c₁r² + c₂r⁴ + c₃r⁶); the energies are its exact integrals.
func discStretching(nu float64) float64 {
	c1 := -(16 + 8*(1-nu)) / 8
	c2 := (64 + 16*(1-nu)) / 24
	c3 := -(48 + 8*(1-nu)) / 48
	c0 := -(c1 + c2 + c3)
	// Strains in s = r²: e_r = u′ + ½w′² and e_θ = u/r, polynomials of degree 3.
	radial := [4]float64{c0, 3*c1 + 8, 5*c2 - 16, 7*c3 + 8}
	hoop := [4]float64{c0, c1, c2, c3}
	energy := 0.0 // ∫(e_r² + 2ν e_r e_θ + e_θ²) r dr = ½∫… ds
	for i := range 4 {
		for j := range 4 {
			product := radial[i]*radial[j] + 2*nu*radial[i]*hoop[j] + hoop[i]*hoop[j]
			energy += 0.5 * product / float64(i+j+1)
		}
	}
	// Stretching ½·Eh/(1−ν²)·w⁴·energy = ¼k₃w⁴, bending ½D·(32/3)·w² = ½k₁w² (both
	// over 2π), D = Eh³/(12(1−ν²)), so k₃/k₁ = 12·2·energy/(32/3)/h².
	return 12 * 2 * energy / (32.0 / 3)
}

// duffingRatio is the exact frequency of q̈ + q + εq³ = 0 at unit amplitude, with
// K by the arithmetic-geometric mean: (π/2)/K(k) = AGM(1, √(1 − k²)).
func duffingRatio(ε float64) float64 {
	a, g := 1.0, math.Sqrt((1+0.5*ε)/(1+ε))
	for range 6 {
		a, g = 0.5*(a+g), math.Sqrt(a*g)
	}
	return math.Sqrt(1+ε) * a
}
