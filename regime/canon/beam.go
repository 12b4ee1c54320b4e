package canon

import (
	"math"
	"strings"
)

// BeamSupport names the supports of a uniform beam: first the end x = 0, then
// the end x = L.
type BeamSupport int

// The supports of a beam.
const (
	PinnedPinned BeamSupport = iota
	ClampedFree
	ClampedClamped
	ClampedPinned
	FreeFree
)

var beamSupportNames = []string{"pinned-pinned", "clamped-free", "clamped-clamped", "clamped-pinned", "free-free"}

func (s BeamSupport) String() string {
	if s < 0 || int(s) >= len(beamSupportNames) {
		return "unknown support"
	}
	return beamSupportNames[s]
}

// beamModeLimit bounds the mode number: beyond it β·x has lost too many digits
// for a mode shape to mean anything, and no structure is a beam any more.
const beamModeLimit = 100000

// beamTipMassLimit bounds the tip mass: beyond it the beam is a massless spring.
const beamTipMassLimit = 1e6

func checkSupport(function, arg string, support BeamSupport) error {
	if support >= PinnedPinned && support <= FreeFree {
		return nil
	}
	return &RangeError{Function: function, Arg: arg, Value: float64(support), Reason: "want one of " + strings.Join(beamSupportNames, ", ")}
}

func checkBeam(function string, support BeamSupport, n int) error {
	if err := checkSupport(function, "support", support); err != nil {
		return err
	}
	return inRange(function, "n", float64(n), 1, beamModeLimit)
}

// BeamMode returns the wave number times the length of a bending mode.
//
// Equation: ω = β²·√(EI/(m L⁴)), with β the nth root of
// sin β = 0 (pinned-pinned); cos β·cosh β = −1 (clamped-free), with a tip mass
// 1 + cos β cosh β = M β (sin β cosh β − cos β sinh β); cos β·cosh β = 1
// (clamped-clamped and free-free); tan β = tanh β (clamped-pinned).
//
// Symbols: ω circular frequency [rad/s], EI bending stiffness [N m²], m mass per
// length [kg/m], L length [m], n mode number from 1 (of a free-free beam the
// first that bends), M = tip mass/(m L), a point mass at the free end x = L.
//
// Range: n from 1 to 100 000, M from 0 to 1e6 at a free end (free-free with a mass:
// n to 1000); at a supported end the mass does not move and M must be 0.
//
// Accuracy: 1e-12, Euler–Bernoulli: rotary inertia and shear are left out.
//
// Check: 1.8751041, 4.6940911; 4.7300407; 3.9266023; π.
//
// Source: Blevins 1979, table 8-1 (from memory).
func BeamMode(support BeamSupport, n int, tipMassRatio float64) (float64, error) {
	const name = "BeamMode"
	if err := checkBeam(name, support, n); err != nil {
		return 0, err
	}
	if err := inRange(name, "tipMassRatio", tipMassRatio, 0, beamTipMassLimit); err != nil {
		return 0, err
	}
	if tipMassRatio == 0 {
		return beamRoot(support, n), nil
	}
	switch support {
	case ClampedFree:
		return tipMassRoot(n, tipMassRatio), nil
	case FreeFree:
		if n > elasticBeamModeLimit {
			return 0, &RangeError{Function: name, Arg: "n", Value: float64(n), Min: 1, Max: elasticBeamModeLimit, Reason: "a free beam with a mass is solved to the mode 1000"}
		}
		return ElasticBeamMode(BeamEnd{}, BeamEnd{Mass: tipMassRatio}, n)
	}
	return 0, &RangeError{Function: name, Arg: "tipMassRatio", Value: tipMassRatio, Reason: "the end x = L is supported, so a mass there does not move"}
}

// beamRoot is β without tip mass, by Newton steps on the equations divided by
// cosh β, which neither overflow nor lose digits at high n.
func beamRoot(support BeamSupport, n int) float64 {
	x := float64(n)
	switch support {
	case PinnedPinned:
		return x * math.Pi
	case ClampedFree:
		if n == 1 {
			return newtonCosSech(1.8751041, 1)
		}
		return newtonCosSech((x-0.5)*math.Pi, 1)
	case ClampedPinned:
		return newtonTanTanh((x + 0.25) * math.Pi)
	}
	return newtonCosSech((x+0.5)*math.Pi, -1)
}

// newtonCosSech solves cos β + s/cosh β = 0. The distance of the start from the
// root is of the order of 1/cosh β, so three quadratic steps exhaust a float64.
func newtonCosSech(β, s float64) float64 {
	for range 4 {
		sech := s / math.Cosh(β)
		sin, cos := math.Sincos(β)
		step := (cos + sech) / (sin + sech*math.Tanh(β))
		β += step
		if math.Abs(step) < 1e-9 {
			break
		}
	}
	return β
}

// newtonTanTanh solves sin β = cos β tanh β.
func newtonTanTanh(β float64) float64 {
	for range 4 {
		sin, cos := math.Sincos(β)
		t := math.Tanh(β)
		step := (sin - cos*t) / (t * (sin + cos*t))
		β -= step
		if math.Abs(step) < 1e-9 {
			break
		}
	}
	return β
}

// tipMassRoot solves cos β + 1/cosh β = M β (sin β − cos β tanh β). The nth root
// lies between the clamped-pinned root n−1, which an infinite mass reaches, and
// the clamped-free root n.
func tipMassRoot(n int, mass float64) float64 {
	lo, hi := 0.0, beamRoot(ClampedFree, n)
	if n > 1 {
		lo = beamRoot(ClampedPinned, n-1)
	}
	// The left side minus the right is positive at the lower end for odd n.
	sign := 1.0
	if n%2 == 0 {
		sign = -1
	}
	β := hi
	for range 200 {
		f, df := tipMassEquation(β, mass)
		if f*sign > 0 {
			lo = β
		} else {
			hi = β
		}
		next := β - f/df
		if !(next > lo && next < hi) {
			next = 0.5 * (lo + hi)
		}
		if math.Abs(next-β) <= 2e-16*β {
			return next
		}
		β = next
	}
	return β
}

func tipMassEquation(β, mass float64) (f, df float64) {
	sin, cos := math.Sincos(β)
	t := math.Tanh(β)
	sech := 1 / math.Cosh(β)
	q := sin - cos*t
	if β < 0.5 {
		q = sech * sinCoshMinusCosSinh(β)
	}
	f = cos + sech - mass*β*q
	df = -sin - sech*t - mass*(q+β*t*(sin+cos*t))
	return f, df
}

// sinCoshMinusCosSinh is sin x cosh x − cos x sinh x by its series, which keeps
// the digits that the difference loses at small x.
func sinCoshMinusCosSinh(x float64) float64 {
	x4 := x * x * x * x
	return 2 * x * x * x / 3 * (1 - x4*(1.0/210-x4*(1.0/415800-x4/3.405402e9)))
}

// beamFunction is a mode shape φ with mean square 1 in a form that is stable for
// any mode number: φ = A cos βx + B sin βx + C e^(−βx) + D e^(−β(1−x)), 0 ≤ x ≤ 1.
type beamFunction struct {
	β, A, B, C, D float64
	σ             float64 // ratio of the odd to the even part in the usual notation
}

// newBeamFunction builds the shape. In the usual notation
// φ = cosh βx ∓ cos βx − σ(sinh βx ∓ sin βx); 1 − σ, which multiplies the growing
// exponential, is written out so that nothing cancels.
func newBeamFunction(support BeamSupport, n int) beamFunction {
	β := beamRoot(support, n)
	if support == PinnedPinned {
		return beamFunction{β: β, B: math.Sqrt2}
	}
	sin, cos := math.Sincos(β)
	e := math.Exp(-β)
	var d float64
	if support == ClampedFree {
		d = (sin - cos - e) / (1 - e*e + 2*e*sin)
	} else {
		d = (cos - sin - e) / (1 - e*e - 2*e*sin)
	}
	σ := 1 - 2*d*e
	f := beamFunction{β: β, A: -1, B: σ, C: 0.5 * (1 + σ), D: d, σ: σ}
	if support == FreeFree {
		f.A, f.B = 1, -σ
	}
	return f
}

// derivative is the kth derivative of φ at x, divided by β^k.
func (f *beamFunction) derivative(k int, x float64) float64 {
	sin, cos := math.Sincos(f.β * x)
	var trig float64
	switch k & 3 {
	case 0:
		trig = f.A*cos + f.B*sin
	case 1:
		trig = f.B*cos - f.A*sin
	case 2:
		trig = -f.A*cos - f.B*sin
	default:
		trig = f.A*sin - f.B*cos
	}
	if f.C == 0 && f.D == 0 {
		return trig
	}
	left := f.C * math.Exp(-f.β*x)
	if k&1 == 1 {
		left = -left
	}
	return trig + left + f.D*math.Exp(-f.β*(1-x))
}

// largest is max |φ⁽ᵏ⁾|/β^k. The exponentials have died out one wave length from
// the ends and the lobes between are all alike, so only the outer lobes are
// searched, and the best sample is refined by Newton steps.
func (f *beamFunction) largest(k int) float64 {
	if f.C == 0 && f.D == 0 {
		return f.B
	}
	best, at := math.Abs(f.derivative(k, 0)), 0.0
	if v := math.Abs(f.derivative(k, 1)); v > best {
		best, at = v, 1
	}
	step := math.Pi / (8 * f.β)
	reach := math.Min(1, 3*math.Pi/f.β)
	for x := step; x < reach+step; x += step {
		inside := math.Min(x, 1)
		if v := math.Abs(f.derivative(k, inside)); v > best {
			best, at = v, inside
		}
		if v := math.Abs(f.derivative(k, 1-inside)); v > best {
			best, at = v, 1-inside
		}
	}
	if at == 0 || at == 1 {
		return best
	}
	for range 4 {
		at -= f.derivative(k+1, at) / (f.β * f.derivative(k+2, at))
	}
	return math.Max(best, math.Abs(f.derivative(k, math.Min(1, math.Max(0, at)))))
}

// peak is max |φ|; at a free end φ = 2 exactly.
func (f *beamFunction) peak(support BeamSupport) float64 {
	switch support {
	case PinnedPinned:
		return math.Sqrt2
	case ClampedFree, FreeFree:
		return 2
	}
	return f.largest(0)
}

// BeamShape returns the shape of a bending mode at x.
//
// Equation: w(x) = [A cos βx + B sin βx + C e^(−βx) + D e^(−β(1−x))]/max, the
// solution of w⁗ = β⁴w with the end conditions; max |w| = 1; w > 0 in the first
// lobe from x = 0.
//
// Symbols: x distance from the first end over the length [-], β as for BeamMode.
//
// Range: n from 1 to 100 000, x from 0 to 1.
//
// Accuracy: 1e-12 (n times the rounding of a float64 at very high n).
//
// Check: clamped-free, n = 1: w(1) = 1, w(0.5) = 0.3395; pinned-pinned: sin nπx.
//
// Source: Blevins 1979, table 8-1 (from memory).
func BeamShape(support BeamSupport, n int, x float64) (float64, error) {
	const name = "BeamShape"
	if err := checkBeam(name, support, n); err != nil {
		return 0, err
	}
	if err := inRange(name, "x", x, 0, 1); err != nil {
		return 0, err
	}
	f := newBeamFunction(support, n)
	return f.derivative(0, x) / f.peak(support), nil
}

// BeamFactors are averages and extremes of a mode shape w with max |w| = 1, in
// units of the length: x from 0 to 1.
type BeamFactors struct {
	Mean            float64 // ∫w dx, w > 0 in the first lobe
	MeanSquare      float64 // ∫w² dx
	MeanSquareSlope float64 // ∫w′² dx
	MaxSlope        float64 // max |w′|
	MaxCurvature    float64 // max |w″|
}

// BeamModeFactors returns averages and extremes of a bending mode's shape.
//
// Equation: with φ the shape of mean square 1 and σ its ratio of parts,
// ∫w² = 1/φmax²; ∫w = [φ‴]/(β⁴ φmax); ∫w′² = βσ(βσ + c)/φmax², c = −2
// clamped-clamped, 2 clamped-free, −1 clamped-pinned, 6 free-free; pinned-pinned
// ½, [1 − (−1)ⁿ]/(nπ), ½(nπ)².
//
// Symbols: w shape with max |w| = 1 [-]; a real slope is MaxSlope·W/L, a real
// curvature MaxCurvature·W/L², W the amplitude and L the length [m].
//
// Range: n from 1 to 100 000.
//
// Accuracy: 1e-10.
//
// Check: clamped-free, n = 1: mean 0.39150, mean square ¼, largest curvature
// ½·2·1.8751² = 3.5160.
//
// Source: Blevins 1979, table 8-1 and appendix C on integrals of beam functions (from memory).
func BeamModeFactors(support BeamSupport, n int) (BeamFactors, error) {
	if err := checkBeam("BeamModeFactors", support, n); err != nil {
		return BeamFactors{}, err
	}
	f := newBeamFunction(support, n)
	peak := f.peak(support)
	β := f.β
	b := BeamFactors{
		MeanSquare:      1 / (peak * peak),
		Mean:            f.mean(support, n) / peak,
		MeanSquareSlope: f.meanSquareSlope(support) / (peak * peak),
		MaxSlope:        β * f.largest(1) / peak,
		MaxCurvature:    β * β * 2 / peak,
	}
	switch support {
	case PinnedPinned:
		b.MaxCurvature = β * β
	case FreeFree: // the curvature has the shape of a clamped-clamped mode
		b.MaxCurvature = β * β * f.largest(2) / peak
	}
	return b, nil
}

// mean is ∫φ dx: φ⁗ = β⁴φ, so it is the difference of φ‴/β⁴ between the ends. It
// is zero, and not rounding, where parity or the free ends make it so.
func (f *beamFunction) mean(support BeamSupport, n int) float64 {
	even := n%2 == 0
	if support == FreeFree || even && (support == PinnedPinned || support == ClampedClamped) {
		return 0
	}
	return (f.derivative(3, 1) - f.derivative(3, 0)) / f.β
}

func (f *beamFunction) meanSquareSlope(support BeamSupport) float64 {
	βσ := f.β * f.σ
	switch support {
	case PinnedPinned:
		return f.β * f.β
	case ClampedFree:
		return βσ * (βσ + 2)
	case ClampedClamped:
		return βσ * (βσ - 2)
	case ClampedPinned:
		return βσ * (βσ - 1)
	}
	return βσ * (βσ + 6)
}
