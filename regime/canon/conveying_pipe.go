package canon

import (
	"math"
	"math/cmplx"

	"regimed/regime/cite"
)

// PipeSupport names the supports of a pipe that conveys fluid, upstream end first.
type PipeSupport string

// The supports that ConveyingPipe knows.
const (
	PipeCantilever     PipeSupport = "cantilever"
	PipePinnedPinned   PipeSupport = "pinned-pinned"
	PipeClampedClamped PipeSupport = "clamped-clamped"
	PipeClampedPinned  PipeSupport = "clamped-pinned"
)

// PipeSupports lists the supports, in the order in which the entry numbers them.
func PipeSupports() []PipeSupport {
	return []PipeSupport{PipeCantilever, PipePinnedPinned, PipeClampedClamped, PipeClampedPinned}
}

// Limits of the arguments of ConveyingPipe.
const (
	pipeBetaMin, pipeBetaMax   = 1e-4, 0.95
	pipeGammaMin, pipeGammaMax = -70.0, 100.0
	pipeAlphaMax               = 0.1
)

// ConveyingPipe is the lowest flow speed at which a pipe that conveys fluid
// loses stability, and the frequency at which it does.
//
//	α η̇'''' + η'''' + (u² − γ(1 − ξ))η″ + 2√β u η̇′ + γη′ + η̈ = 0;
//	cantilever: a pair u, ω at which the determinant of the boundary conditions
//	η(0) = η′(0) = η″(1) = η‴(1) = 0 vanishes, the lowest u of all;
//	supported ends: static buckling, for γ = 0: π, 2π, 4.493409457909
//
// Symbols: u = UL√(ρA/EI) [1], A the bore area, ρ the fluid in it; β = M/(M + m)
// [1], M fluid and m pipe per length; γ = (M + m)gL³/(EI) [1], positive where
// the downstream end hangs below; α [1], Kelvin–Voigt damping E*/E √(EI/(M + m))/L²;
// ω·L²√((M + m)/EI) [1], 0 for buckling.
// Range: 1e-4 ≤ β ≤ 0.95, −70 ≤ γ ≤ 100, 0 ≤ α ≤ 0.1; γ above the weight under
// which the pipe without flow buckles: −7.837 cantilever, −18.57 pinned,
// −74.63 clamped, −52.50 clamped–pinned.
// The cantilever with β > 0.9 and γ > 40 together may have its onset beyond
// u = 32: then a RangeError.
// Accuracy: 1e-8.
// Check: cantilever β 0.2: u 5.59140437783, ω 13.7146998005; γ 10: 6.33979801811.
// Source: Gregory & Païdoussis 1966; Païdoussis 1998 (from memory).
func ConveyingPipe(beta, gamma, alpha float64, support PipeSupport) (u, omega float64, err error) {
	for _, c := range []struct {
		name          string
		v, vMin, vMax float64
	}{
		{"beta", beta, pipeBetaMin, pipeBetaMax},
		{"gamma", gamma, pipeGammaMin, pipeGammaMax},
		{"alpha", alpha, 0, pipeAlphaMax},
	} {
		if err := inRange("ConveyingPipe", c.name, c.v, c.vMin, c.vMax); err != nil {
			return 0, 0, err
		}
	}
	weight, known := pipeOwnWeight[support]
	if !known {
		return 0, 0, &RangeError{Function: "ConveyingPipe", Arg: "support", Value: math.NaN(), Reason: "unknown support " + string(support)}
	}
	if gamma <= weight {
		return 0, 0, &RangeError{Function: "ConveyingPipe", Arg: "gamma", Value: gamma, Reason: "the pipe buckles under its own weight without flow"}
	}
	if support == PipeCantilever {
		p := conveyingPipe{beta, gamma, alpha}
		o := pipeFlutterMemo.of(p, func() pipeFlutterOnset {
			u, omega, err := pipeFlutter(p)
			return pipeFlutterOnset{u, omega, err}
		})
		return o.u, o.omega, o.err
	}
	u, err = pipeBuckling(gamma, support)
	return u, 0, err
}

type pipeFlutterOnset struct {
	u, omega float64
	err      error
}

var pipeFlutterMemo = newSolvedMemo[conveyingPipe, pipeFlutterOnset](1 << 10)

// pipeOwnWeight is γ at which the pipe without flow buckles; the test finds
// each as a zero of the static determinant.
var pipeOwnWeight = map[PipeSupport]float64{
	PipeCantilever:     -7.8373,
	PipePinnedPinned:   -18.5686,
	PipeClampedClamped: -74.6285,
	PipeClampedPinned:  -52.5006,
}

// conveyingPipe holds the parameters of a cantilever.
type conveyingPipe struct{ beta, gamma, alpha float64 }

// determinant of the boundary conditions of the cantilever for motion e^{iωτ},
// ω real or complex, up to a factor that does not vanish.
func (p conveyingPipe) determinant(u float64, omega complex128) complex128 {
	if p.gamma == 0 {
		return p.determinantByRoots(u, omega)
	}
	return p.determinantBySeries(u, omega)
}

// determinantByRoots sums four waves e^{iκξ} with
// (1 + iαω)κ⁴ − u²κ² − 2√β uωκ − ω² = 0. Division by the Vandermonde product
// of the roots removes the zeros at which two roots coincide.
func (p conveyingPipe) determinantByRoots(u float64, omega complex128) complex128 {
	stiffness := 1 + complex(0, p.alpha)*omega
	k := quarticRoots(0, complex(-u*u, 0)/stiffness, complex(-2*math.Sqrt(p.beta)*u, 0)*omega/stiffness, -omega*omega/stiffness)
	var f [4]complex128
	for i := range k {
		f[i] = k[i] * k[i] * cmplx.Exp(1i*k[i])
	}
	// Expansion by pairs: columns i, j of the rows at ξ = 1, the others at 0.
	pair := func(i, j, m, n int) complex128 {
		return f[i] * f[j] * (k[j] - k[i]) * (k[n] - k[m])
	}
	sum := pair(0, 1, 2, 3) - pair(0, 2, 1, 3) + pair(0, 3, 1, 2) +
		pair(1, 2, 0, 3) - pair(1, 3, 0, 2) + pair(2, 3, 0, 1)
	v := complex(1, 0)
	for i := range k {
		for j := i + 1; j < len(k); j++ {
			v *= k[j] - k[i]
		}
	}
	return sum / v
}

// determinantBySeries carries the two solutions that are clamped at ξ = 0 along
// the pipe by power series, in pieces short enough that a series does not
// cancel. Between pieces the first solution is taken out of the second, which
// leaves the determinant as it is and keeps the two apart.
func (p conveyingPipe) determinantBySeries(u float64, omega complex128) complex128 {
	return p.determinantInPieces(u, omega, 1+int(math.Sqrt(cmplx.Abs(omega)+u*u+math.Abs(p.gamma))/5))
}

func (p conveyingPipe) determinantInPieces(u float64, omega complex128, pieces int) complex128 {
	h := 1 / float64(pieces)
	first, second := pipeLine{2: 1}, pipeLine{3: 1}
	for i := range pieces {
		xi := float64(i) * h
		first = p.carry(first, u, omega, xi, h)
		second = p.carry(second, u, omega, xi, h)
		second.takeOut(first)
	}
	return first[2]*second[3] - first[3]*second[2]
}

// pipeLine is η, η′, η″, η‴ at a section.
type pipeLine [4]complex128

func (l *pipeLine) takeOut(other pipeLine) {
	var product complex128
	var norm float64
	for i, v := range other {
		product += cmplx.Conj(v) * l[i]
		norm += real(v)*real(v) + imag(v)*imag(v)
	}
	share := product / complex(norm, 0)
	for i, v := range other {
		l[i] -= share * v
	}
}

// carry takes a solution from ξ to ξ + h by its power series about ξ.
func (p conveyingPipe) carry(from pipeLine, u float64, omega complex128, xi, h float64) pipeLine {
	stiffness := 1 / (1 + complex(0, p.alpha)*omega)
	second := complex(u*u-p.gamma*(1-xi), 0) * stiffness
	coriolis := complex(0, 2*math.Sqrt(p.beta)*u) * omega * stiffness
	gravity := complex(p.gamma, 0) * stiffness
	inertia := omega * omega * stiffness
	// The powers of h are kept in the coefficients cₙhⁿ.
	h1 := complex(h, 0)
	h2, h3 := h1*h1, h1*h1*h1
	h4 := h2 * h2
	c := [4]complex128{from[0], from[1] * h1, from[2] * h2 / 2, from[3] * h3 / 6}
	sum := [4]complex128{c[0] + c[1] + c[2] + c[3], c[1] + 2*c[2] + 3*c[3], 2*c[2] + 6*c[3], 6 * c[3]}
	small := 0
	for n := 0; n < 200 && small < 4; n++ {
		a := float64(n + 1)
		next := inertia*h4*c[0] - complex(a, 0)*(coriolis+complex(a, 0)*gravity)*h3*c[1] - complex(a*(a+1), 0)*second*h2*c[2]
		next *= complex(1/(a*(a+1)*(a+2)*(a+3)), 0)
		d1 := next * complex(a+3, 0)
		d2 := d1 * complex(a+2, 0)
		d3 := d2 * complex(a+1, 0)
		sum[0] += next
		sum[1] += d1
		sum[2] += d2
		sum[3] += d3
		if cmplx.Abs(d3) < 1e-17*(cmplx.Abs(sum[3])+cmplx.Abs(sum[0])) {
			small++
		} else {
			small = 0
		}
		c[0], c[1], c[2], c[3] = c[1], c[2], c[3], next
	}
	return pipeLine{sum[0], sum[1] / h1, sum[2] / h2, sum[3] / h3}
}

// pipeUncertainty is the relative change of u that another evaluation of the
// determinant makes: by series where the roots gave it, and by series in more
// pieces where series did. Buckling speeds are closed forms, or halved to rounding.
func pipeUncertainty(p conveyingPipe, support PipeSupport, u, omega float64) float64 {
	if support != PipeCantilever {
		return 1e-14
	}
	pieces := 2 + int(math.Sqrt(math.Abs(omega)+u*u+math.Abs(p.gamma))/3)
	step, _, ok := newtonOnPlane(func(u, omega float64) complex128 {
		return p.determinantInPieces(u, complex(omega, 0), pieces)
	}, u, omega)
	if !ok {
		return 1
	}
	return math.Abs(step)/u + 1e-14
}

var conveyingPipeEntry = &Entry{
	Name:     "ConveyingPipe",
	Problem:  "flow speed at which a pipe that conveys fluid flutters or buckles",
	Equation: "α η̇'''' + η'''' + (u² − γ(1 − ξ))η″ + 2√β u η̇′ + γη′ + η̈ = 0; lowest u at which the boundary determinant vanishes for a real ω; pinned π, clamped 2π, clamped–pinned 4.4934 at γ = 0",
	Args: []Arg{
		{Name: "beta", Symbol: "β", Doc: "fluid over total mass per length", Min: pipeBetaMin, Max: pipeBetaMax, From: 0.01, To: pipeBetaMax, Typical: 0.2},
		{Name: "gamma", Symbol: "γ", Doc: "(M + m)gL³/(EI), positive for a hanging pipe", Min: pipeGammaMin, Max: pipeGammaMax, Optional: true},
		{Name: "alpha", Symbol: "α", Doc: "dimensionless Kelvin–Voigt damping of the wall", Min: 0, Max: pipeAlphaMax, Optional: true},
		{Name: "support", Symbol: "support", Doc: "supports, upstream end first", Choices: pipeSupportNames(), Optional: true},
	},
	Outputs: []Output{
		{ID: "u", Symbol: "u_c", Doc: "critical UL√(ρA/EI)"},
		{ID: "omega", Symbol: "ω", Doc: "frequency at onset times L²√((M + m)/EI); 0 for buckling"},
		{ID: UncertaintyID, Symbol: "δ", Doc: "relative change of u_c that the determinant, evaluated otherwise, makes"},
	},
	Accuracy: 1e-8,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.GregoryPaidoussis1966, cite.Paidoussis1998},
	Note:     "plug flow, no external damping; the cantilever's curve folds near β 0.3, 0.7 and 0.9, and the lowest branch is given",
	Eval: func(a []float64) ([]float64, error) {
		support := PipeSupports()[int(a[3])]
		u, omega, err := ConveyingPipe(a[0], a[1], a[2], support)
		if err != nil {
			return nil, err
		}
		return []float64{u, omega, pipeUncertainty(conveyingPipe{a[0], a[1], a[2]}, support, u, omega)}, nil
	},
}

func pipeSupportNames() []string {
	var names []string
	for _, s := range PipeSupports() {
		names = append(names, string(s))
	}
	return names
}
