package canon

import (
	"fmt"
	"math"
)

const imagesMaxGap = 1e12

// CylinderNearWall gives the added mass coefficient of a circular cylinder close
// to a plane wall, in ideal fluid at rest: the same for motion along the wall
// and towards it.
//
//	C = 1 + 2Σsᵢ, s₀ = 1, sᵢ₊₁ = sᵢ/dᵢ², d₀ = 2H, dᵢ₊₁ = 2H − 1/dᵢ
//	  = 2 sinh²α Σ_{n≥1} 1/sinh²(nα) − 1, cosh α = H = 1 + 2e
//
// e = gap/D with D the diameter (m) and the gap between cylinder and wall (m);
// sᵢ the strengths of the dipole images and dᵢ their distances, in radii. The
// second form is the sum of the first in closed terms; for small α it is summed
// after the reciprocal transformation, so that touching is no special case. The
// added mass per length is C ρπD²/4 (kg/m).
//
// Range: e from 0 to 1e12. Accuracy: 1e-13. Check value: e = 0.25 gives
// 1.25878145271. Limits: e → ∞ 1; e = 0 π²/3 − 1.
//
// Source: potential theory; Lamb 1932, chapters IV and VI, for the images
// (from memory).
func CylinderNearWall(e float64) (c float64, err error) {
	if err := inRange("CylinderNearWall", "e", e, 0, imagesMaxGap); err != nil {
		return 0, err
	}
	alpha := imagesAngle(e)
	return 2*imagesSum(alpha, 1) - 1, nil
}

// SurfaceKind says how a free surface acts on a body below it.
type SurfaceKind int

// The two limits of a free surface.
const (
	RigidLid     SurfaceKind = iota // slow motion, ω²d/g ≪ 1
	PressureFree                    // fast motion, ω²d/g ≫ 1
)

// String names the kind as the argument of the entry does.
func (k SurfaceKind) String() string {
	switch k {
	case RigidLid:
		return "rigid-lid"
	case PressureFree:
		return "pressure-free"
	default:
		return fmt.Sprintf("SurfaceKind(%d)", int(k))
	}
}

// CylinderBelowSurface gives the added mass coefficient of a circular cylinder
// below a free surface, in ideal fluid at rest, in the limits of slow motion, for
// which the surface is a rigid lid, and of fast motion, for which the pressure
// on it stays constant.
//
//	rigid lid:     C = 1 + 2Σsᵢ
//	pressure-free: C = 1 + 2Σ(−1)ⁱsᵢ = 2 sinh²α Σ_{n≥1} (−1)ⁿ⁻¹/sinh²(nα) − 1
//
// sᵢ and α as in CylinderNearWall at e = d; d = cover/D, the cover the distance
// from the surface at rest to the top of the cylinder (m), D the diameter (m): the
// axis lies at (d + ½)D. The coefficient holds for motion along and across the
// surface; C ρπD²/4 is the added mass per length (kg/m).
//
// Range: d from 0 to 1e12. Accuracy: 1e-13. Check value: d = 0 gives π²/3 − 1
// and π²/6 − 1. Limit: d → ∞ 1.
//
// Source: potential theory; Lamb 1932, chapters IV and VI, for the images
// (from memory).
func CylinderBelowSurface(d float64, kind SurfaceKind) (c float64, err error) {
	const name = "CylinderBelowSurface"
	if err := inRange(name, "d", d, 0, imagesMaxGap); err != nil {
		return 0, err
	}
	alpha := imagesAngle(d)
	switch kind {
	case RigidLid:
		return 2*imagesSum(alpha, 1) - 1, nil
	case PressureFree:
		// Σ(−1)ⁿ⁻¹aₙ = Σaₙ − 2Σa₂ₙ.
		return 2*(imagesSum(alpha, 1)-2*imagesSum(alpha, 2)) - 1, nil
	default:
		return 0, &RangeError{Function: name, Arg: "kind", Value: float64(kind), Reason: "want rigid-lid or pressure-free"}
	}
}

// imagesAngle returns α with cosh α = 1 + 2e.
func imagesAngle(e float64) float64 {
	return 2 * math.Asinh(math.Sqrt(e))
}

// imagesSum returns sinh²α Σ_{n≥1} 1/sinh²(nmα) for m = 1 or 2. Below mα = π it
// uses the reciprocal transformation of the sum,
//
//	Σ 1/sinh²(nβ) = π²/(6β²) − 1/β + 1/6 − (π²/β²) Σ 1/sinh²(nπ²/β)
//
// which follows from that of the Eisenstein series of weight two.
func imagesSum(alpha, m float64) float64 {
	beta := m * alpha
	if beta >= math.Pi {
		return imagesDirect(alpha, m)
	}
	if beta < 1e-100 {
		return math.Pi * math.Pi / 6 / (m * m)
	}
	sh := math.Sinh(alpha)
	scaled := sh / beta
	rest := 0.0
	for n := 1.0; n < 10; n++ {
		x := n * math.Pi * math.Pi / beta
		if x > 40 {
			break
		}
		s := math.Sinh(x)
		rest += 1 / (s * s)
	}
	return math.Pi*math.Pi*scaled*scaled*(1./6-rest) - sh*scaled + sh*sh/6
}

func imagesDirect(alpha, m float64) float64 {
	sh := math.Sinh(alpha)
	sum := 0.0
	for n := 1.0; n < 20; n++ {
		t := sh / math.Sinh(n*m*alpha)
		sum += t * t
		if t < 1e-9 {
			break
		}
	}
	return sum
}
