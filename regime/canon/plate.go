package canon

import (
	"math"
	"strings"
)

// plateModeLimit bounds the half waves (or the rank) of a rectangular plate's mode.
const plateModeLimit = 10

// plateKey are the arguments of PlateMode.
type plateKey struct {
	edges  [4]byte
	aspect float64
	m, n   int
	nu     float64
}

// ritzRemainder is what the terms left out may make, over what the last ones made:
// at the corner of a clamped and a free edge the polynomials converge as a power
// of their number, and sets of 24 by 24 lie below sets of 8 by 8 by twice the last
// change.
const ritzRemainder = 4

type plateAnswer struct{ lambda2, uncertainty float64 }

var plateModes = newSolvedMemo[plateKey, plateAnswer](1024)

// PlateMode returns the frequency parameter of a thin rectangular plate.
//
// Equation: λ² = ω a² √(ρh/D); D∇⁴w = ρhω²w. All edges simply supported
// π²(m² + n²s²), s = a/b; otherwise by Rayleigh–Ritz: a sine along a pair of
// opposite simply supported edges, which is exact, and in the other directions
// polynomials that satisfy the geometric edge conditions and are orthogonal.
//
// Symbols: edges four letters for x = 0, y = 0, x = a, y = b: C clamped, S simply
// supported, F free; a, b sides along x and y [m]; ω circular frequency [rad/s], ρ
// density [kg/m³], h thickness [m], D = Eh³/(12(1−ν²)) [N m], ν Poisson's ratio.
// No free edge: m and n half waves along x and y; of the two modes of a square
// plate that mix (m, n) with (n, m), the lower goes with m > n. A pair of opposite
// simply supported edges: m (or n) half waves between that pair, and the other
// number ranks the modes that have it. Otherwise m ranks all modes by frequency
// and n must be 1. Motions of zero frequency are not counted.
//
// Range: aspect s from 0.1 to 10; m, n from 1 to 10; ν from 0 to 0.5.
//
// Accuracy: an upper bound; uncertainty is four times the relative change made by
// the last polynomials, typically 1e-6 without free edges, 5e-4 where a clamped
// edge meets a free one, ten times more at an aspect of 10.
//
// Check: SSSS square 19.739; CCCC square 35.985; CFFF square, ν = 0.3: 3.471;
// FFFF square, ν = 0.3: 13.468.
//
// Source: Leissa 1969, chapter 4; Leissa 1973; Bhat 1985 (from memory).
func PlateMode(edges string, aspect float64, m, n int, nu float64) (lambda2, uncertainty float64, err error) {
	key, err := checkPlate(edges, aspect, m, n, nu)
	if err != nil {
		return 0, 0, err
	}
	if key.edges == [4]byte{'S', 'S', 'S', 'S'} {
		x, y := float64(m), float64(n)*aspect
		return math.Pi * math.Pi * (x*x + y*y), 0, nil
	}
	a := plateModes.of(key, func() plateAnswer { return solvePlate(key) })
	return a.lambda2, a.uncertainty, nil
}

func checkPlate(edges string, aspect float64, m, n int, nu float64) (plateKey, error) {
	const name = "PlateMode"
	edges = strings.ToUpper(edges)
	if len(edges) != 4 || strings.Trim(edges, "CSF") != "" {
		return plateKey{}, &RangeError{Function: name, Arg: "edges", Reason: "want four letters out of C, S and F for x = 0, y = 0, x = a, y = b"}
	}
	for _, err := range [...]error{
		inRange(name, "aspect", aspect, 0.1, 10),
		inRange(name, "m", float64(m), 1, plateModeLimit),
		inRange(name, "n", float64(n), 1, plateModeLimit),
		inRange(name, "nu", nu, 0, 0.5),
	} {
		if err != nil {
			return plateKey{}, err
		}
	}
	k := plateKey{edges: [4]byte([]byte(edges)), aspect: aspect, m: m, n: n, nu: nu}
	if n != 1 && k.ranked() {
		return plateKey{}, &RangeError{Function: name, Arg: "n", Value: float64(n), Reason: "with a free edge and no opposite edges simply supported, m ranks the modes and n is 1"}
	}
	return k, nil
}

func (k *plateKey) free() bool { return strings.IndexByte(string(k.edges[:]), 'F') >= 0 }
func (k *plateKey) sineX() bool {
	return k.edges[0] == 'S' && k.edges[2] == 'S'
}
func (k *plateKey) sineY() bool {
	return k.edges[1] == 'S' && k.edges[3] == 'S'
}

// ranked tells that the modes have no numbers but their order.
func (k *plateKey) ranked() bool { return k.free() && !k.sineX() && !k.sineY() }

// swapped is the same mode of the same plate with x and y exchanged; its λ²
// refers to b.
func (k *plateKey) swapped() plateKey {
	return plateKey{
		edges:  [4]byte{k.edges[1], k.edges[0], k.edges[3], k.edges[2]},
		aspect: 1 / k.aspect, m: k.n, n: k.m, nu: k.nu,
	}
}

// solvePlate solves with two numbers of polynomials and returns the better
// solution and the relative difference.
func solvePlate(k plateKey) plateAnswer {
	if k.sineY() && !k.sineX() {
		other := k.swapped()
		a := solvePlate(other)
		a.lambda2 *= k.aspect * k.aspect
		return a
	}
	rough, fine := 0.0, 0.0
	switch {
	case k.sineX():
		rough, fine = solveSinePlate(k)
	case k.free():
		rough, fine = rankPlateModes(k)
	default:
		rough, fine = solveHeldPlate(k)
	}
	return plateAnswer{lambda2: fine, uncertainty: ritzRemainder * math.Abs(rough/fine-1)}
}
