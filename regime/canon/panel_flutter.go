package canon

import (
	"cmp"
	"math"
	"slices"

	"gonum.org/v1/gonum/lapack"
	"gonum.org/v1/gonum/lapack/gonum"

	"regimed/regime/cite"
)

const (
	panelMaxModes = 20
	panelSpace    = panelMaxModes + 1 // one more bounds the error of the most
)

// PanelFlutter is the critical pressure of a panel simply supported on all
// edges in supersonic flow, by first-order piston theory without damping.
//
//	w'''' − 2(πr)²w″ + (πr)⁴w + λw′ − Ω²w = 0, w = w″ = 0 at both ends, on sine modes:
//	the lowest λ at which two Ω² meet
//
// Symbols: λ = 2qa³/(D√(M² − 1)) [1], a the length along the flow; r = a/b =
// aspect [1], b the width, 0 for a panel of infinite width; Ω = ωa²√(ρ_s h/D) [1];
// modes [1], number of sine modes.
// Range: 2 ≤ modes ≤ 20; 0 ≤ a/b ≤ 3. M above √2 or so.
// Accuracy: 1e-9 for the number of modes; ten modes are 5e-5 off the converged
// value at a/b 0.
// Check: a/b 0: 273.96 (2 modes), 340.60 (4), 343.34 (10), converged 343.36.
// Source: Dowell 1975 (from memory).
func PanelFlutter(modes int, aspect float64) (lambda, omega float64, err error) {
	if err := inRange("PanelFlutter", "modes", float64(modes), 2, panelMaxModes); err != nil {
		return 0, 0, err
	}
	if err := inRange("PanelFlutter", "aspect", aspect, 0, 3); err != nil {
		return 0, 0, err
	}
	return panelMeeting(modes, aspect)
}

// panelFew is the number of modes that finds the meeting within a percent or two,
// for as long as the panel is not far longer than wide, in a fraction of the time.
const panelFew = 8

// panelMeeting is PanelFlutter without the check, to panelSpace modes.
func panelMeeting(modes int, aspect float64) (lambda, omega float64, err error) {
	p := panel{modes: min(modes, panelFew), aspect: aspect}
	lo, hi, pair := p.march()
	if pair >= 0 {
		lambda, omega = p.meeting(pair, lo, hi)
	}
	if modes > panelFew && pair >= 0 {
		p.modes = modes
		lo, hi = 0.97*lambda, 1.03*lambda
		if pair = p.complexPair(hi); pair < 0 || p.complexPair(lo) >= 0 {
			lo, hi, pair = p.march()
		}
		if pair >= 0 {
			lambda, omega = p.meeting(pair, lo, hi)
		}
	}
	if pair < 0 {
		return 0, 0, &RangeError{Function: "PanelFlutter", Arg: "modes", Value: float64(modes), Reason: "no two modes meet"}
	}
	return lambda, math.Sqrt(omega), nil
}

// march takes λ up to the first complex pair. Two modes meet before more do, so
// that it begins below them.
func (p *panel) march() (lo, hi float64, pair int) {
	step := 0.1 * p.twoModes()
	lo = 9 * step
	hi = lo
	for range 40 {
		hi += step
		if pair = p.complexPair(hi); pair >= 0 {
			return lo, hi, pair
		}
		lo = hi
	}
	return lo, hi, -1
}

// panelUncertainty is the relative change of λ that more modes may make. With an
// even number of modes λ lies below the converged value and with an odd one
// above, so that the next number bounds the error; fewer than six modes are too
// few for that on a long panel, and are compared with eight and nine.
func panelUncertainty(modes int, aspect, lambda float64) (float64, error) {
	others := []int{modes + 1}
	if modes < 6 {
		others = []int{8, 9}
	}
	worst := 0.0
	for _, n := range others {
		other, _, err := panelMeeting(n, aspect)
		if err != nil {
			return 0, err
		}
		worst = max(worst, math.Abs(other/lambda-1))
	}
	return worst, nil
}

// meeting finds where (Ω₁² − Ω₂²)² of the pair, which is analytic in λ,
// changes sign, by false position (Illinois).
func (p *panel) meeting(pair int, lo, hi float64) (lambda, square float64) {
	gapLo, _ := p.gap(pair, lo)
	gapHi, _ := p.gap(pair, hi)
	stale := 0 // the end that stays while the other moves: its weight is halved
	for range 60 {
		before := lambda
		lambda = (lo*gapHi - hi*gapLo) / (gapHi - gapLo)
		var g float64
		g, square = p.gap(pair, lambda)
		// The gap of two frequencies that meet drowns in rounding about here.
		if math.Abs(lambda-before) < 1e-11*lambda || hi-lo < 1e-13*hi {
			break
		}
		if g < 0 {
			hi, gapHi = lambda, g
			if stale == -1 {
				gapLo /= 2
			}
			stale = -1
			continue
		}
		lo, gapLo = lambda, g
		if stale == 1 {
			gapHi /= 2
		}
		stale = 1
	}
	return lambda, square
}

type panel struct {
	modes  int
	aspect float64
	a      [panelSpace * panelSpace]float64
	wr, wi [panelSpace]float64
	square [panelSpace]complex128
	work   [8 * panelSpace]float64
}

// bending is the term of mode n = 1, 2, … on the diagonal.
func (p *panel) bending(n int) float64 {
	s := math.Pi * math.Pi * (float64(n*n) + p.aspect*p.aspect)
	return s * s
}

// twoModes is the closed solution for two modes: λ·8/3 = half their distance.
func (p *panel) twoModes() float64 { return 3. / 16 * (p.bending(2) - p.bending(1)) }

// solve finds all Ω², in rising order of their real parts.
func (p *panel) solve(lambda float64) {
	n := p.modes
	clear(p.a[:n*n])
	for i := 1; i <= n; i++ {
		p.a[(i-1)*n+i-1] = p.bending(i)
		for j := 1; j <= n; j++ {
			if (i+j)%2 == 1 {
				p.a[(i-1)*n+j-1] = lambda * 4 * float64(i*j) / float64(i*i-j*j)
			}
		}
	}
	gonum.Implementation{}.Dgeev(lapack.LeftEVNone, lapack.RightEVNone, n, p.a[:n*n], n, p.wr[:n], p.wi[:n], nil, 1, nil, 1, p.work[:], len(p.work))
	for i := range n {
		p.square[i] = complex(p.wr[i], p.wi[i])
	}
	slices.SortFunc(p.square[:n], func(a, b complex128) int { return cmp.Compare(real(a), real(b)) })
}

// complexPair is the place of the first complex pair at λ, or −1.
func (p *panel) complexPair(lambda float64) int {
	p.solve(lambda)
	return slices.IndexFunc(p.square[:p.modes], func(z complex128) bool { return imag(z) != 0 })
}

// gap is (Ω₁² − Ω₂²)² of a pair, negative where it is complex, and its mean Ω².
func (p *panel) gap(pair int, lambda float64) (gap, mean float64) {
	p.solve(lambda)
	z, w := p.square[pair], p.square[pair+1]
	d := w - z
	return real(d * d), real(z+w) / 2
}

// PanelDivergence is the dynamic pressure at which a wide panel buckles
// statically in subsonic flow.
//
//	q a³/D = (π³/2)√(1 − M²), wetted on one side; half of it on two
//
// Symbols: sides = 1 or 2; mach = M [1]; q [Pa] dynamic pressure, a [m] length
// along the flow, pinned at both ends, D [N·m] bending stiffness.
// Range: 0 ≤ M ≤ 0.9.
// Accuracy: one half-wave of an infinite wavy wall; a single panel in a rigid
// wall diverges at 20.04 on one side, 29 % higher.
// Check: 15.50 on one side, 7.75 on two, at M 0.
// Source: wavy wall, Liepmann & Roshko 1957; Dowell 1975 (from memory).
func PanelDivergence(sides int, mach float64) (float64, error) {
	if err := inRange("PanelDivergence", "sides", float64(sides), 1, 2); err != nil {
		return 0, err
	}
	if err := inRange("PanelDivergence", "mach", mach, 0, 0.9); err != nil {
		return 0, err
	}
	return math.Pow(math.Pi, 3) / 2 * math.Sqrt(1-mach*mach) / float64(sides), nil
}

var panelFlutterEntry = &Entry{
	Name:     "PanelFlutter",
	Problem:  "flutter of a simply supported panel in supersonic flow",
	Equation: "w'''' − 2(πr)²w″ + (πr)⁴w + λw′ = Ω²w on sine modes; λ = 2qa³/(D√(M² − 1)) where two Ω² first meet",
	Args: []Arg{
		{Name: "modes", Symbol: "N", Doc: "number of sine modes, a whole number", Min: 2, Max: panelMaxModes, Whole: true, Optional: true, Default: 10},
		{Name: "aspect", Symbol: "a/b", Doc: "length along the flow over width, 0 for infinite width", Min: 0, Max: 3, Optional: true},
	},
	Outputs: []Output{
		{ID: "lambda", Symbol: "λ_c", Doc: "critical 2qa³/(D√(M² − 1))"},
		{ID: "omega", Symbol: "Ω", Doc: "frequency at onset times a²√(ρ_s h/D)"},
		{ID: UncertaintyID, Symbol: "δ", Doc: "relative change of λ_c that more modes may make"},
	},
	Accuracy: 1e-9,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.Dowell1975},
	Note:     "the accuracy is that for the number of modes; M above √2 or so; no tension, no damping, no cavity, no boundary layer",
	Limits: []Limit{
		{"infinite width, converged: 343.356", "lambda", Low, 1e-4, constant(343.356)},
	},
	Eval: func(a []float64) ([]float64, error) {
		lambda, omega, err := PanelFlutter(int(a[0]), a[1])
		if err != nil {
			return nil, err
		}
		uncertainty, err := panelUncertainty(int(a[0]), a[1], lambda)
		return []float64{lambda, omega, uncertainty}, err
	},
}

var panelDivergenceEntry = &Entry{
	Name:     "PanelDivergence",
	Problem:  "static divergence of a wide pinned panel in subsonic flow",
	Equation: "q a³/D = (π³/2)√(1 − M²) on one side, half of it on two",
	Args: []Arg{
		{Name: "sides", Symbol: "sides", Doc: "wetted sides", Choices: []string{"one", "two"}, Optional: true},
		{Name: "mach", Symbol: "M", Doc: "Mach number", Min: 0, Max: 0.9, Optional: true},
	},
	Outputs:  []Output{{ID: "pressure", Symbol: "qa³/D", Doc: "critical dynamic pressure"}},
	Accuracy: 0.2,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.Liepmann1957, cite.Dowell1975},
	Limits: []Limit{
		{"incompressible: π³/2 on one side, half of it on two", "pressure", Low, 1e-12, func(a []float64) float64 {
			return math.Pow(math.Pi, 3) / 2 / (a[0] + 1)
		}},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := PanelDivergence(int(a[0])+1, a[1])
		return []float64{v}, err
	},
}
