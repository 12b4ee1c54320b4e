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

// SloshingMassFraction is the share of the liquid that sloshes in one mode, and
// that which no mode up to this one moves.
//
//	rectangular: m_n/m = 8 tanh(nπh/L)/(n³π³h/L) for odd n, 0 for even n;
//	upright circular: m_n/m = 2 tanh(ε_n h/R)/(ε_n(ε_n² − 1)h/R); m_0/m = 1 − Σ_{k≤n} m_k/m
//
// Symbols: upright: which of the two; n [1], mode; depth = h/L or h/R [1]; ε_n the
// zeros of J₁′. m_0 goes, as n grows, to the mass that moves with the tank.
// Range: 1 ≤ n ≤ 50; 1e-4 ≤ depth ≤ 1e4. Shallow: all of the liquid sloshes.
// Accuracy: exact for small inviscid motion.
// Check: depth 0.4: 0.548362728416 rectangular, 0.712454253354 upright circular.
// Source: Abramson 1966, NASA SP-106 (from memory).
func SloshingMassFraction(upright bool, n int, depth float64) (massFraction, rigidFraction float64, err error) {
	if err := checkTank("SloshingMassFraction", n, depth); err != nil {
		return 0, 0, err
	}
	solve := RectangularTank
	if upright {
		solve = UprightTank
	}
	rigidFraction = 1
	for k := 1; k <= n; k++ {
		if _, massFraction, err = solve(k, depth); err != nil {
			return 0, 0, err
		}
		rigidFraction -= massFraction
	}
	return massFraction, rigidFraction, nil
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

// tank says what the entries of the two tanks differ in.
type tank struct {
	name, problem, equation, length string
	inShallow, inDeep               string // the formulas of the mass fraction
	solve                           func(n int, depth float64) (frequency, massFraction float64, err error)
	// wave is the wave number of mode n, and shallow the mass that it takes along
	// in shallow liquid, both over the length.
	wave, shallow func(n int) float64
}

var (
	rectangularTank = tank{
		name: "RectangularTank", problem: "sloshing mode of a rectangular tank", length: "L",
		equation:  "ω²L/g = nπ tanh(nπh/L); m_n/m = 8 tanh(nπh/L)/(n³π³h/L), n odd",
		inShallow: "8/(n²π²), odd n", inDeep: "8L/(n³π³h), odd n",
		solve: RectangularTank,
		wave:  func(n int) float64 { return float64(n) * math.Pi },
		shallow: func(n int) float64 {
			if n%2 == 0 {
				return 0
			}
			return 8 / (math.Pi * math.Pi * float64(n*n))
		},
	}
	uprightTank = tank{
		name: "UprightTank", problem: "sloshing mode of an upright circular tank", length: "R",
		equation:  "ω²R/g = ε_n tanh(ε_n h/R), J₁′(ε_n) = 0; m_n/m = 2 tanh(ε_n h/R)/(ε_n(ε_n² − 1)h/R)",
		inShallow: "2/(ε_n² − 1)", inDeep: "2R/(ε_n(ε_n² − 1)h)",
		solve: UprightTank,
		wave:  uprightTankRoot,
		shallow: func(n int) float64 {
			ε := uprightTankRoot(n)
			return 2 / (ε*ε - 1)
		},
	}
	tanks     = [...]tank{rectangularTank, uprightTank}
	tankNames = []string{"rectangular", "upright-circular"}
)

// deep is the mass fraction in deep liquid.
func (t *tank) deep(n int, depth float64) float64 { return t.shallow(n) / (t.wave(n) * depth) }

// tankDepth is the argument of the depth over a length.
func tankDepth(length string) Arg {
	return Arg{Name: "depth", Symbol: "h/" + length, Doc: "liquid depth over length along the motion, or over radius", Min: tankMinDepth, Max: tankMaxDepth, From: 0.01, To: 10}
}

func (t *tank) entry() *Entry {
	return &Entry{
		Name: t.name, Problem: t.problem, Equation: t.equation,
		Args: []Arg{
			{Name: "n", Symbol: "n", Doc: "mode, a whole number", Min: 1, Max: tankMaxMode, Whole: true},
			tankDepth(t.length),
		},
		Outputs: []Output{
			{ID: "frequency", Symbol: "ω√(" + t.length + "/g)", Doc: "sloshing frequency"},
			{ID: "mass_fraction", Symbol: "m_n/m", Doc: "share of the liquid that sloshes in this mode under lateral motion"},
		},
		Accuracy: 1e-12,
		Factor:   1.15,
		Sources:  []*cite.Source{cite.Abramson1966},
		Note:     "small motion, rigid walls, no viscosity, no surface tension",
		Limits: []Limit{
			{"shallow: κ√(h/" + t.length + ")", "frequency", Low, 1e-6, func(a []float64) float64 { return t.wave(int(a[0])) * math.Sqrt(a[1]) }},
			{"deep: √κ", "frequency", High, 1e-12, func(a []float64) float64 { return math.Sqrt(t.wave(int(a[0]))) }},
			{"shallow: " + t.inShallow, "mass_fraction", Low, 1e-6, func(a []float64) float64 { return t.shallow(int(a[0])) }},
			{"deep: " + t.inDeep, "mass_fraction", High, 1e-12, func(a []float64) float64 { return t.deep(int(a[0]), a[1]) }},
		},
		Eval: func(a []float64) ([]float64, error) {
			frequency, mass, err := t.solve(int(a[0]), a[1])
			return []float64{frequency, mass}, err
		},
	}
}

var (
	rectangularTankEntry = rectangularTank.entry()
	uprightTankEntry     = uprightTank.entry()
)

var sloshingMassFractionEntry = &Entry{
	Name:     "SloshingMassFraction",
	Problem:  "share of the liquid in a tank that sloshes under lateral motion",
	Equation: "rectangular 8 tanh(nπh/L)/(n³π³h/L), n odd; upright circular 2 tanh(ε_n h/R)/(ε_n(ε_n² − 1)h/R)",
	Args: []Arg{
		{Name: "tank", Doc: "shape of the tank", Choices: tankNames},
		tankDepth("L or h/R"),
		{Name: "n", Symbol: "n", Doc: "mode, a whole number", Min: 1, Max: tankMaxMode, Whole: true, Optional: true, Default: 1},
	},
	Outputs: []Output{
		{ID: "mass_fraction", Symbol: "m_n/m", Doc: "sloshing over total mass"},
		{ID: "rigid_fraction", Symbol: "m_0/m", Doc: "what no mode up to this one moves, over total mass"},
	},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Abramson1966},
	Note:     "small motion, rigid walls; the masses of all modes and that which moves with the tank make the whole",
	Limits: []Limit{
		{"shallow: 8/(n²π²), 2/(ε_n² − 1)", "mass_fraction", Low, 1e-6, func(a []float64) float64 { return tanks[int(a[0])].shallow(int(a[2])) }},
		{"deep: 8L/(n³π³h), 2R/(ε_n(ε_n² − 1)h)", "mass_fraction", High, 1e-12, func(a []float64) float64 { return tanks[int(a[0])].deep(int(a[2]), a[1]) }},
	},
	Eval: func(a []float64) ([]float64, error) {
		return twoValues(SloshingMassFraction(tankNames[int(a[0])] == "upright-circular", int(a[2]), a[1]))
	},
}
