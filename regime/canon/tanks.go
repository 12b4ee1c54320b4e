package canon

import (
	"math"

	"regimed/regime/cite"
)

const (
	tankMaxMode  = 50
	tankMinDepth = 1e-4
	tankMaxDepth = 1e4
)

// RectangularTank is the n-th sloshing mode of a rectangular tank along its
// length: frequency, and share of the liquid that moves with it.
//
//	ω²L/g = nπ tanh(nπh/L); m_n/m = 8 tanh(nπh/L)/(n³π³h/L) for odd n, 0 for even n
//
// Symbols: n [1], half-waves along the length L; depth = h/L [1], liquid depth;
// frequency = ω√(L/g) [1]; massFraction = m_n/m [1], of lateral motion.
// Range: 1 ≤ n ≤ 50; 1e-4 ≤ h/L ≤ 1e4.
// Accuracy: exact for small inviscid motion.
// Check: n 1, h/L 0.4: mass 0.548362728416.
// Source: Abramson 1966, NASA SP-106 (from memory).
func RectangularTank(n int, depth float64) (frequency, massFraction float64, err error) {
	if err := checkTank("RectangularTank", n, depth); err != nil {
		return 0, 0, err
	}
	wave := float64(n) * math.Pi
	t := math.Tanh(wave * depth)
	if n%2 == 1 {
		massFraction = 8 * t / (wave * wave * wave * depth)
	}
	return math.Sqrt(wave * t), massFraction, nil
}

// UprightTank is the n-th sloshing mode with one nodal diameter of an upright
// circular tank.
//
//	ω²R/g = ε_n tanh(ε_n h/R), J₁′(ε_n) = 0; m_n/m = 2 tanh(ε_n h/R)/(ε_n(ε_n² − 1)h/R)
//
// Symbols: n [1], number of the root, ε_1 = 1.8411838; depth = h/R [1], liquid
// depth; frequency = ω√(R/g) [1]; massFraction = m_n/m [1], of lateral motion.
// Range: 1 ≤ n ≤ 50; 1e-4 ≤ h/R ≤ 1e4.
// Accuracy: exact for small inviscid motion.
// Check: n 1, h/R 0.4: mass 0.712454253354.
// Source: Abramson 1966, NASA SP-106 (from memory).
func UprightTank(n int, depth float64) (frequency, massFraction float64, err error) {
	if err := checkTank("UprightTank", n, depth); err != nil {
		return 0, 0, err
	}
	wave := uprightTankRoot(n)
	t := math.Tanh(wave * depth)
	return math.Sqrt(wave * t), 2 * t / (wave * (wave*wave - 1) * depth), nil
}

func checkTank(function string, n int, depth float64) error {
	if err := inRange(function, "n", float64(n), 1, tankMaxMode); err != nil {
		return err
	}
	return inRange(function, "depth", depth, tankMinDepth, tankMaxDepth)
}

// uprightTankRoot is the n-th zero of J₁′, by Newton's method from McMahon's
// expansion.
func uprightTankRoot(n int) float64 {
	b := (float64(n) - 0.25) * math.Pi
	x := b - 7/(8*b)
	for range 8 {
		j0, j1 := math.J0(x), math.J1(x)
		slope := j0 - j1/x
		// J₁″ = −J₁′/x − (1 − 1/x²)J₁
		dx := slope / (-slope/x - (1-1/(x*x))*j1)
		x -= dx
		if math.Abs(dx) < 1e-15*x {
			break
		}
	}
	return x
}

func tankEntry(name, problem, equation, length string, eval func(int, float64) (float64, float64, error)) *Entry {
	return &Entry{
		Name: name, Problem: problem, Equation: equation,
		Args: []Arg{
			{Name: "n", Symbol: "n", Doc: "mode, a whole number", Min: 1, Max: tankMaxMode},
			{Name: "depth", Symbol: "h/" + length, Doc: "liquid depth", Min: tankMinDepth, Max: tankMaxDepth},
		},
		Outputs: []Output{
			{ID: "frequency", Symbol: "ω√(" + length + "/g)", Doc: "sloshing frequency"},
			{ID: "mass_fraction", Symbol: "m_n/m", Doc: "share of the liquid that sloshes in this mode under lateral motion"},
		},
		Accuracy: 1e-12,
		Factor:   1.15,
		Sources:  []*cite.Source{cite.Abramson1966},
		Note:     "small motion, rigid walls, no viscosity, no surface tension",
		Eval: func(a []float64) ([]float64, error) {
			if a[0] != math.Trunc(a[0]) {
				return nil, &RangeError{Function: name, Arg: "n", Value: a[0], Reason: "want a whole number"}
			}
			frequency, mass, err := eval(int(a[0]), a[1])
			return []float64{frequency, mass}, err
		},
	}
}

var rectangularTankEntry = tankEntry("RectangularTank", "sloshing mode of a rectangular tank",
	"ω²L/g = nπ tanh(nπh/L); m_n/m = 8 tanh(nπh/L)/(n³π³h/L), n odd", "L", RectangularTank)

var uprightTankEntry = tankEntry("UprightTank", "sloshing mode of an upright circular tank",
	"ω²R/g = ε_n tanh(ε_n h/R), J₁′(ε_n) = 0; m_n/m = 2 tanh(ε_n h/R)/(ε_n(ε_n² − 1)h/R)", "R", UprightTank)
