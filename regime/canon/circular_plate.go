package canon

import (
	"math"
	"strings"
)

// CircularEdge names how a circular plate is held at its edge.
type CircularEdge int

// The edges of a circular plate.
const (
	CircularClamped CircularEdge = iota
	CircularSimplySupported
	CircularFree
)

var circularEdgeNames = []string{"clamped", "simply-supported", "free"}

// discModeLimit bounds the nodal circles and diameters.
const discModeLimit = 10

func checkDisc(function string, edge CircularEdge, circles, diameters int, nu float64) error {
	if edge < CircularClamped || edge > CircularFree {
		return &RangeError{Function: function, Arg: "edge", Value: float64(edge), Reason: "want one of " + strings.Join(circularEdgeNames, ", ")}
	}
	for _, err := range [...]error{
		inRange(function, "circles", float64(circles), 0, discModeLimit),
		inRange(function, "diameters", float64(diameters), 0, discModeLimit),
		inRange(function, "nu", nu, 0, 0.5),
	} {
		if err != nil {
			return err
		}
	}
	if edge == CircularFree && circles == 0 && diameters < 2 {
		return &RangeError{Function: function, Arg: "circles", Value: 0, Reason: "a free plate moves without strain unless it has a nodal circle or two diameters"}
	}
	return nil
}

// CircularPlateMode returns the frequency parameter of a thin circular plate.
//
// Equation: λ² = ω a² √(ρh/D), w = [J_s(λr) + C I_s(λr)] cos sθ, with λ the root of
// J_s I_(s+1) + I_s J_(s+1) = 0 (clamped);
// J_(s+1)/J_s + I_(s+1)/I_s = 2λ/(1 − ν) (simply supported);
// bending moment and edge shear zero (free), all at λ.
//
// Symbols: a radius [m], ω circular frequency [rad/s], ρ density [kg/m³], h
// thickness [m], D = Eh³/(12(1−ν²)) [N m], r radius over a, circles the nodal
// circles within the edge, diameters s the nodal diameters, ν Poisson's ratio (of
// no effect if clamped).
//
// Range: circles and diameters from 0 to 10; free: at least one circle or two
// diameters; ν from 0 to 0.5.
//
// Accuracy: 1e-12 of thin-plate theory.
//
// Check: clamped 10.2158, 39.7711, 89.1041 (0, 1, 2 circles), 21.2604 (one
// diameter); ν = 0.3: simply supported 4.9351, free with two diameters 5.3583.
//
// Source: Leissa 1969, chapter 2 (from memory).
func CircularPlateMode(edge CircularEdge, circles, diameters int, nu float64) (float64, error) {
	if err := checkDisc("CircularPlateMode", edge, circles, diameters, nu); err != nil {
		return 0, err
	}
	λ := discRoot(edge, circles, diameters, nu)
	return λ * λ, nil
}

func discRoot(edge CircularEdge, circles, diameters int, nu float64) float64 {
	switch edge {
	case CircularClamped:
		return heldDiscRoot(math.Inf(1), circles, diameters, nu)
	case CircularSimplySupported:
		return heldDiscRoot(0, circles, diameters, nu)
	}
	return freeDiscRoot(circles, diameters, nu)
}

// ElasticCircularPlateMode returns the frequency parameter of a circular plate
// whose edge does not deflect and is held by a rotational spring.
//
// Equation: (κ − 1 + ν)·[J_(s+1)(λ) + J_s(λ) I_(s+1)(λ)/I_s(λ)] + 2λ J_s(λ) = 0,
// λ² = ω a² √(ρh/D).
//
// Symbols: κ = kθ a/D, kθ rotational stiffness per length of edge [N], D bending
// stiffness [N m]; the rest as for CircularPlateMode.
//
// Range: κ from 0; at least 1e12 is clamped.
//
// Accuracy: 1e-12 of thin-plate theory.
//
// Check: κ = 0, ν = 0.3: 4.9351; κ → ∞: 10.2158.
//
// Source: Leissa 1969, chapter 2 (from memory).
func ElasticCircularPlateMode(kappa float64, circles, diameters int, nu float64) (float64, error) {
	const name = "ElasticCircularPlateMode"
	if err := checkDisc(name, CircularClamped, circles, diameters, nu); err != nil {
		return 0, err
	}
	if err := inRange(name, "kappa", kappa, 0, math.Inf(1)); err != nil {
		return 0, err
	}
	λ := heldDiscRoot(kappa, circles, diameters, nu)
	return λ * λ, nil
}

// heldDiscRoot solves the equation of the elastic edge. For κ = 1 − ν its roots
// are the zeros j of J_s, number circles + 1; a stiffer edge has its root between
// that zero and the zero of J_(s+1) after it, a softer one between it and the zero
// of J_(s+1) before it.
func heldDiscRoot(κ float64, circles, s int, nu float64) float64 {
	excess := κ - 1 + nu
	middle := discBesselZero(s, circles+1)
	if excess == 0 {
		return middle
	}
	f := func(λ float64) float64 {
		edge := math.Jn(s+1, λ) + math.Jn(s, λ)*discIRatio(s, λ)
		if κ >= rigidSpring {
			return edge
		}
		return excess*edge + 2*λ*math.Jn(s, λ)
	}
	switch {
	case excess > 0:
		return structureRoot(f, middle, discBesselZero(s+1, circles+1))
	case circles == 0:
		return structureRoot(f, 1e-3, middle)
	}
	return structureRoot(f, discBesselZero(s+1, circles), middle)
}

// freeDiscRoot counts changes of sign of the free edge's determinant from below
// the first root; the roots of one s lie more than 2.3 apart.
func freeDiscRoot(circles, s int, nu float64) float64 {
	wanted := circles
	if s < 2 {
		wanted-- // no strain without a nodal circle
	}
	f := func(λ float64) float64 { return freeDiscDeterminant(λ, s, nu) }
	const step = 0.5
	λ := math.Max(1, 0.5*float64(s))
	before := f(λ)
	for {
		next := f(λ + step)
		if (before < 0) != (next < 0) {
			if wanted == 0 {
				return structureRoot(f, λ, λ+step)
			}
			wanted--
		}
		λ += step
		before = next
	}
}

// freeDiscDeterminant is zero where edge moment and edge shear vanish together;
// divided by I_s.
func freeDiscDeterminant(λ float64, s int, nu float64) float64 {
	mJ, mI, vJ, vI := freeDiscEdge(λ, s, nu)
	return mJ*vI - mI*vJ
}

// freeDiscEdge is the edge moment and the edge shear, signs reversed, of J_s(λr)
// and of I_s(λr)/I_s(λ).
func freeDiscEdge(λ float64, s int, nu float64) (mJ, mI, vJ, vI float64) {
	n := float64(s)
	j := math.Jn(s, λ)
	dj := n*j - λ*math.Jn(s+1, λ) // λ J_s′
	di := n + λ*discIRatio(s, λ)
	mJ = λ*λ*j + (1-nu)*(dj-n*n*j)
	mI = -λ*λ + (1-nu)*(di-n*n)
	vJ = λ*λ*dj + (1-nu)*n*n*(dj-j)
	vI = -λ*λ*di + (1-nu)*n*n*(di-1)
	return mJ, mI, vJ, vI
}

// discBesselZero is the kth positive zero of J_s. All zeros lie above √(s(s+2)), and
// more than 3 apart.
func discBesselZero(s, k int) float64 {
	n := float64(s)
	f := func(x float64) float64 { return math.Jn(s, x) }
	const step = 1.5
	x := math.Max(1, math.Sqrt(n*(n+2)))
	before := f(x)
	for {
		next := f(x + step)
		if (before < 0) != (next < 0) {
			k--
			if k == 0 {
				return structureRoot(f, x, x+step)
			}
		}
		x += step
		before = next
	}
}

// discIRatio is I_(s+1)(x)/I_s(x), by its continued fraction
// 1/(2(s+1)/x + 1/(2(s+2)/x + …)), from far enough down.
func discIRatio(s int, x float64) float64 {
	if x == 0 {
		return 0
	}
	depth := 20 + int(1.2*x)
	r := 0.0
	for k := s + depth; k > s; k-- {
		r = 1 / (2*float64(k)/x + r)
	}
	return r
}

// discIScaled is e^(−x) I_s(x) by the series, whose terms are all positive.
func discIScaled(s int, x float64) float64 {
	half := 0.5 * x
	term := math.Exp(-x)
	for k := 1; k <= s; k++ {
		term *= half / float64(k)
	}
	sum := term
	for k := 1; k < 1000; k++ {
		term *= half * half / (float64(k) * float64(k+s))
		sum += term
		if term < 1e-17*sum {
			break
		}
	}
	return sum
}

// structureRoot finds the root of f between two points of opposite sign by false
// position with halving of the stale end (Illinois), and bisection as a fallback.
func structureRoot(f func(float64) float64, lo, hi float64) float64 {
	flo, fhi := f(lo), f(hi)
	if (flo > 0) == (fhi > 0) { // the root is an end, within rounding
		if math.Abs(flo) < math.Abs(fhi) {
			return lo
		}
		return hi
	}
	stale := 0 // the end that stays while the other moves: its weight is halved
	for i := range 200 {
		mid := (lo*fhi - hi*flo) / (fhi - flo)
		if i%8 == 7 || !(mid > lo && mid < hi) {
			mid = 0.5 * (lo + hi)
		}
		fmid := f(mid)
		if fmid == 0 || hi-lo < 1e-15*hi {
			return mid
		}
		if (fmid > 0) == (flo > 0) {
			lo, flo = mid, fmid
			if stale == 1 {
				fhi *= 0.5
			}
			stale = 1
			continue
		}
		hi, fhi = mid, fmid
		if stale == -1 {
			flo *= 0.5
		}
		stale = -1
	}
	return 0.5 * (lo + hi)
}
