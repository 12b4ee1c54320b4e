package canon

import (
	"errors"
	"math"
	"testing"

	"pgregory.net/rapid"
)

// checkReporter is what a test and a rapid check have in common.
type checkReporter interface {
	Helper()
	Errorf(format string, args ...any)
	Fatal(args ...any)
}

// structureClose compares with a relative tolerance, absolute below 1.
func structureClose(t checkReporter, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance*math.Max(1, math.Abs(want))) {
		t.Errorf("%s: got %.12g, want %.12g", what, got, want)
	}
}

// structureMust unwraps a result in a test.
func structureMust(t checkReporter) func(float64, error) float64 {
	return func(x float64, err error) float64 {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return x
	}
}

var allBeamSupports = []BeamSupport{PinnedPinned, ClampedFree, ClampedClamped, ClampedPinned, FreeFree}

// integrateBeam is ∫f dx over 0 to 1 with plenty of nodes.
func integrateBeam(f func(x float64) float64) float64 {
	rule := legendreRuleFor(120)
	sum := 0.0
	for i, x := range rule.x {
		sum += rule.w[i] * f(x)
	}
	return sum
}

func TestBeamModeAgainstPublishedRoots(t *testing.T) {
	// Blevins 1979, table 8-1, from memory, and the equations at 12 digits.
	rows := []struct {
		support BeamSupport
		n       int
		β       float64
	}{
		{PinnedPinned, 1, math.Pi}, {PinnedPinned, 7, 7 * math.Pi},
		{ClampedFree, 1, 1.875104068712}, {ClampedFree, 2, 4.694091132974}, {ClampedFree, 3, 7.854757438238},
		{ClampedClamped, 1, 4.730040744863}, {ClampedClamped, 2, 7.853204624096},
		{ClampedPinned, 1, 3.926602312048}, {ClampedPinned, 2, 7.068582745629},
		{FreeFree, 1, 4.730040744863},
	}
	ran := 0
	for _, r := range rows {
		structureClose(t, r.support.String(), structureMust(t)(BeamMode(r.support, r.n, 0)), r.β, 1e-12)
		ran++
	}
	if ran != 10 {
		t.Errorf("ran %d rows", ran)
	}
	tally(t, "BeamMode", "published roots", ran)
}

func TestBeamRootsSolveTheirEquationsAtAnyMode(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n := rapid.IntRange(1, 100000).Draw(t, "n")
		for _, s := range allBeamSupports {
			β := structureMust(t)(BeamMode(s, n, 0))
			sin, cos := math.Sincos(β)
			var residual float64
			switch s {
			case PinnedPinned:
				residual = sin
			case ClampedFree:
				residual = cos + 1/math.Cosh(β)
			case ClampedPinned:
				residual = sin - cos*math.Tanh(β)
			default:
				residual = cos - 1/math.Cosh(β)
			}
			if math.Abs(residual) > 4e-15*math.Max(1, β) {
				t.Fatalf("%v %d: residual %g", s, n, residual)
			}
		}
	})
	tally(t, "BeamMode", "residual of the frequency equation", len(allBeamSupports))
}

func TestBeamTipMass(t *testing.T) {
	must := structureMust(t)
	// A heavy mass on a massless spring 3EI/L³ with 33/140 of the beam's mass: β⁴ = 3/(M + 33/140).
	for _, mass := range []float64{1e2, 1e4, 1e6} {
		β := must(BeamMode(ClampedFree, 1, mass))
		structureClose(t, "heavy tip", math.Pow(β, 4)*(mass+33.0/140)/3, 1, 1e-4/mass*100)
	}
	rapid.Check(t, func(t *rapid.T) {
		mass := math.Pow(10, rapid.Float64Range(-6, 6).Draw(t, "log mass"))
		n := rapid.IntRange(1, 20).Draw(t, "n")
		β := structureMust(t)(BeamMode(ClampedFree, n, mass))
		heavier := structureMust(t)(BeamMode(ClampedFree, n, mass*0.9))
		other := structureMust(t)(ElasticBeamMode(BeamEnd{Translation: 1e12, Rotation: 1e12}, BeamEnd{Mass: mass}, n))
		if β > heavier {
			t.Fatalf("frequency rises with mass: %g at %g", β, mass)
		}
		structureClose(t, "against the dynamic stiffness", β, other, 1e-8)
	})
	// A mass at one end of a free beam, infinite: it pins the end, with the rotation free.
	structureClose(t, "free-free", must(BeamMode(FreeFree, 1, 1e6)), 3.926602312, 1e-5)
	for _, s := range []BeamSupport{PinnedPinned, ClampedClamped, ClampedPinned} {
		if _, err := BeamMode(s, 1, 1); err == nil {
			t.Errorf("%v takes a mass on a support", s)
		}
	}
	tally(t, "BeamMode", "heavy mass on a massless spring", 3)
}

func TestBeamShapesMeetTheirEnds(t *testing.T) {
	for _, s := range allBeamSupports {
		for _, n := range []int{1, 2, 3, 10, 1000} {
			f := newBeamFunction(s, n)
			zero := map[BeamSupport][4]int{ // vanishing derivatives: two at x = 0, two at x = 1
				PinnedPinned: {0, 2, 0, 2}, ClampedFree: {0, 1, 2, 3}, ClampedClamped: {0, 1, 0, 1},
				ClampedPinned: {0, 1, 0, 2}, FreeFree: {2, 3, 2, 3},
			}[s]
			for i, k := range zero {
				structureClose(t, s.String(), f.derivative(k, float64(i/2)), 0, 1e-14*f.β+1e-14)
			}
		}
	}
	tally(t, "BeamShape", "end conditions", 100)
}

func TestBeamShapesAreOrthonormal(t *testing.T) {
	for _, s := range allBeamSupports {
		for n := 1; n <= 8; n++ {
			f := newBeamFunction(s, n)
			for m := 1; m <= n; m++ {
				g := newBeamFunction(s, m)
				want := 0.0
				if m == n {
					want = 1
				}
				structureClose(t, s.String(), integrateBeam(func(x float64) float64 { return f.derivative(0, x) * g.derivative(0, x) }), want, 1e-12)
			}
		}
	}
	tally(t, "BeamShape", "orthonormality", 180)
}

func TestBeamModeFactorsAgainstQuadrature(t *testing.T) {
	ran := 0
	for _, s := range allBeamSupports {
		for n := 1; n <= 9; n++ {
			b, err := BeamModeFactors(s, n)
			if err != nil {
				t.Fatal(err)
			}
			f := newBeamFunction(s, n)
			peak, slope, curvature := 0.0, 0.0, 0.0
			for i := range 20001 {
				x := float64(i) / 20000
				peak = math.Max(peak, math.Abs(f.derivative(0, x)))
				slope = math.Max(slope, math.Abs(f.derivative(1, x)))
				curvature = math.Max(curvature, math.Abs(f.derivative(2, x)))
			}
			mean := integrateBeam(func(x float64) float64 { return f.derivative(0, x) })
			square := integrateBeam(func(x float64) float64 { return math.Pow(f.derivative(0, x), 2) })
			slopes := integrateBeam(func(x float64) float64 { return math.Pow(f.β*f.derivative(1, x), 2) })
			structureClose(t, "mean", b.Mean, mean/peak, 1e-6)
			structureClose(t, "mean square", b.MeanSquare, square/peak/peak, 1e-6)
			structureClose(t, "mean square slope", b.MeanSquareSlope*peak*peak/slopes, 1, 1e-5)
			structureClose(t, "slope", b.MaxSlope, f.β*slope/peak, 1e-6)
			structureClose(t, "curvature", b.MaxCurvature, f.β*f.β*curvature/peak, 1e-6)
			ran++
		}
	}
	if ran != 45 {
		t.Errorf("ran %d rows", ran)
	}
	b, _ := BeamModeFactors(ClampedFree, 1)
	structureClose(t, "cantilever mean", b.Mean, 0.391495878, 1e-9) // 2σ/β/2, σ = 0.734095514
	structureClose(t, "cantilever curvature", b.MaxCurvature, 3.516015269, 1e-9)
	tally(t, "BeamModeFactors", "quadrature of the shape", 5*ran)
	tally(t, "BeamModeFactors", "published factors of the cantilever", 2)
}

func TestBeamShapeIsNormalised(t *testing.T) {
	must := structureMust(t)
	structureClose(t, "tip", must(BeamShape(ClampedFree, 1, 1)), 1, 1e-14)
	structureClose(t, "middle of cantilever", must(BeamShape(ClampedFree, 1, 0.5)), 0.3395230, 1e-6)
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.SampledFrom(allBeamSupports).Draw(t, "support")
		n := rapid.IntRange(1, 100000).Draw(t, "n")
		x := rapid.Float64Range(0, 1).Draw(t, "x")
		if w := structureMust(t)(BeamShape(s, n, x)); math.Abs(w) > 1+1e-9 {
			t.Fatalf("%v %d: |w(%g)| = %g", s, n, x, w)
		}
		first := structureMust(t)(BeamShape(s, n, 0.3/float64(n)))
		if s != FreeFree && first <= 0 {
			t.Fatalf("%v %d: first lobe %g", s, n, first)
		}
	})
	tally(t, "BeamShape", "published middle of the cantilever", 1)
}

func TestElasticBeamLimits(t *testing.T) {
	must := structureMust(t)
	held := BeamEnd{Translation: 1e12}
	clamped := BeamEnd{Translation: math.Inf(1), Rotation: math.Inf(1)}
	rows := []struct {
		left, right BeamEnd
		support     BeamSupport
	}{
		{held, held, PinnedPinned}, {clamped, BeamEnd{}, ClampedFree}, {clamped, clamped, ClampedClamped},
		{clamped, held, ClampedPinned}, {BeamEnd{}, BeamEnd{}, FreeFree}, {BeamEnd{}, clamped, ClampedFree},
	}
	ran := 0
	for _, r := range rows {
		for _, n := range []int{1, 2, 3, 50} {
			structureClose(t, r.support.String(), must(ElasticBeamMode(r.left, r.right, n)), must(BeamMode(r.support, n, 0)), 1e-10)
			ran++
		}
	}
	if ran != 24 {
		t.Errorf("ran %d rows", ran)
	}
	// A stiff beam on soft springs: bounce β⁴ = 2k and rock β⁴ = 6k.
	for _, k := range []float64{1e-4, 1e-3} {
		soft := BeamEnd{Translation: k}
		structureClose(t, "bounce", math.Pow(must(ElasticBeamMode(soft, soft, 1)), 4)/(2*k), 1, k)
		structureClose(t, "rock", math.Pow(must(ElasticBeamMode(soft, soft, 2)), 4)/(6*k), 1, k)
	}
	// Pinned at the left, free at the right: tan β = tanh β, the rotation as a rigid body not counted.
	structureClose(t, "pinned-free", must(ElasticBeamMode(held, BeamEnd{}, 1)), 3.926602312048, 1e-10)
	// Cantilever with a spring at the tip: sin β cosh β − cos β sinh β = −(β³/k)(1 + cos β cosh β).
	for _, k := range []float64{0.1, 10, 1e3} {
		β := must(ElasticBeamMode(clamped, BeamEnd{Translation: k}, 1))
		sin, cos := math.Sincos(β)
		lhs := k * (sin*math.Cosh(β) - cos*math.Sinh(β))
		rhs := -β * β * β * (1 + cos*math.Cosh(β))
		structureClose(t, "tip spring", lhs/rhs, 1, 1e-9)
	}
	var e *RangeError
	if _, err := ElasticBeamMode(BeamEnd{Translation: 1e-9}, held, 1); !errors.As(err, &e) {
		t.Errorf("a stiffness below the rounding is accepted: %v", err)
	}
	tally(t, "ElasticBeamMode", "rigid springs: the classical supports", ran+1)
	tally(t, "ElasticBeamMode", "soft springs: bounce and rock", 4)
	tally(t, "ElasticBeamMode", "cantilever with a tip spring, scalar equation", 3)
}

func TestElasticBeamRisesWithStiffness(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		spring := func(name string) float64 { return math.Pow(10, rapid.Float64Range(-4, 8).Draw(t, name)) }
		left := BeamEnd{Translation: spring("k0"), Rotation: spring("r0")}
		right := BeamEnd{Translation: spring("k1"), Rotation: spring("r1"), Mass: rapid.Float64Range(0, 3).Draw(t, "mass")}
		n := rapid.IntRange(1, 8).Draw(t, "n")
		β := structureMust(t)(ElasticBeamMode(left, right, n))
		stiffer := right
		stiffer.Translation *= 2
		if up := structureMust(t)(ElasticBeamMode(left, stiffer, n)); up < β*(1-1e-8) {
			t.Fatalf("stiffer spring lowers β from %g to %g", β, up)
		}
		structureClose(t, "mirror image", structureMust(t)(ElasticBeamMode(right, left, n)), β, 1e-8)
	})
	tally(t, "ElasticBeamMode", "mirror image, and rise with stiffness", 2)
}

func TestTensionedBeam(t *testing.T) {
	must := structureMust(t)
	// The determinant must give the exact pinned-pinned result.
	for _, τ := range []float64{-9, -1, 1e-3, 1, 100, 1e5} {
		d := newBeamDegrees(BeamEnd{Translation: rigidSpring}, BeamEnd{Translation: rigidSpring})
		for _, n := range []int{1, 2, 7} {
			ω0 := math.Pow(float64(n)*math.Pi, 2)
			ω := nthBeamFrequency(&d, n, τ, ω0*math.Sqrt(1+math.Max(0, τ)/ω0))
			structureClose(t, "pinned", ω/ω0, must(TensionedBeam(PinnedPinned, n, τ)), 1e-9)
		}
	}
	for _, s := range allBeamSupports[:4] {
		ω0 := math.Pow(beamRoot(s, 1), 2)
		// Near buckling the square of the frequency vanishes with the load.
		low := must(TensionedBeam(s, 1, -0.999*bucklingLoad(s)))
		half := must(TensionedBeam(s, 1, -0.998*bucklingLoad(s)))
		structureClose(t, s.String()+" buckling", low*low/(half*half), 0.5, 0.01)
		// By Rayleigh's quotient with the shape without tension, an upper bound and the slope at τ = 0.
		b, _ := BeamModeFactors(s, 1)
		τ := 1e-3
		bound := 1 + τ*b.MeanSquareSlope/b.MeanSquare/(ω0*ω0)
		structureClose(t, s.String()+" slope at no tension", math.Pow(must(TensionedBeam(s, 1, τ)), 2), bound, 1e-8)
	}
	// A taut string with clamped ends acts as one shorter by 2/√τ.
	structureClose(t, "string", must(TensionedBeam(ClampedClamped, 1, 1e6))*math.Pow(beamRoot(ClampedClamped, 1), 2)/(math.Pi*1000*(1+2e-3+4e-6)), 1, 1e-5)
	if _, err := TensionedBeam(ClampedFree, 1, -3); err == nil {
		t.Error("a buckled cantilever is accepted")
	}
	if _, err := TensionedBeam(FreeFree, 1, 1); err == nil {
		t.Error("a free-free beam is accepted")
	}
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.SampledFrom(allBeamSupports[:4]).Draw(t, "support")
		n := rapid.IntRange(1, 10).Draw(t, "n")
		τ := math.Pow(10, rapid.Float64Range(-6, 5.9).Draw(t, "log tension"))
		if a, b := structureMust(t)(TensionedBeam(s, n, τ)), structureMust(t)(TensionedBeam(s, n, 1.2*τ)); b <= a*(1-1e-8) || a < 1-1e-8 {
			t.Fatalf("%v %d: %g at %g, %g at more", s, n, a, τ, b)
		}
	})
	tally(t, "TensionedBeam", "pinned ends: √(1 + τ/(n²π²)) by the determinant", 18)
	tally(t, "TensionedBeam", "slope at no tension by Rayleigh's quotient", 4)
	tally(t, "TensionedBeam", "buckling", 4)
}

func BenchmarkBeamMode(b *testing.B) {
	for _, s := range allBeamSupports {
		b.Run(s.String(), func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				_, _ = BeamMode(s, 1, 0)
			}
		})
	}
	b.Run("tip mass", func(b *testing.B) {
		for b.Loop() {
			_, _ = BeamMode(ClampedFree, 1, 0.5)
		}
	})
	b.Run("elastic", func(b *testing.B) {
		b.ReportAllocs()
		for b.Loop() {
			_, _ = ElasticBeamMode(BeamEnd{Translation: 1e12, Rotation: 10}, BeamEnd{Translation: 3}, 1)
		}
	})
	b.Run("tensioned", func(b *testing.B) {
		for b.Loop() {
			_, _ = TensionedBeam(ClampedClamped, 1, 50)
		}
	})
	b.Run("factors", func(b *testing.B) {
		for b.Loop() {
			_, _ = BeamModeFactors(ClampedClamped, 1)
		}
	})
	b.Run("shape", func(b *testing.B) {
		for b.Loop() {
			_, _ = BeamShape(ClampedFree, 3, 0.4)
		}
	})
}
