package canon

import (
	"math"
	"math/cmplx"
	"slices"
	"testing"

	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"
)

// Values computed independently to 30 digits.
func TestSectionFlutterCheckValues(t *testing.T) {
	runFlowChecks(t, 4, []flowCheck{
		{"SectionFlutter", []float64{20, -0.2, 0.1, 0.24, 0.4}, []float64{2.18391495927, 0.648983536806, 0.297165205105}, 1e-10},
		{"SectionFlutter", []float64{10, -0.4, 0.2, 0.25, 0.2}, []float64{2.07515234539, 0.595619333533, 0.287024388767}, 1e-10},
		{"SectionFlutter", []float64{50, -0.3, 0.1, 0.25, 0.5}, []float64{3.40085058787, 0.680077454796, 0.199972753058}, 1e-10},
		{"SectionFlutter", []float64{5, -0.2, 0.2, 0.3, 0.3}, []float64{1.27283890149, 0.719197956121, 0.565034550152}, 1e-10},
	})
	// Hodges & Pierce's worked section (from memory): 2.17 to 2.19.
	u, _, _, err := SectionFlutter(20, -0.2, 0.1, 0.24, 0.4, 0, 0)
	if err != nil || u < 2.17 || u > 2.19 {
		t.Errorf("worked section: %g, %v", u, err)
	}
	tally(t, "SectionFlutter", "worked section", 1)
}

var flutterSections = []flutterSection{
	{20, -0.2, 0.1, 0.24, 0.4, 0, 0},
	{10, -0.4, 0.2, 0.25, 0.2, 0, 0},
	{50, -0.3, 0.1, 0.25, 0.5, 0, 0},
	{5, -0.2, 0.2, 0.3, 0.3, 0, 0},
	{100, -0.2, 0.2, 0.25, 0.8, 0, 0},
	{40, -0.3, 0.4, 0.3, 1.2, 0, 0},
	{2, -0.1, 0.1, 0.3, 0.5, 0, 0},
	{30, 0, 0.05, 0.2, 0.6, 0, 0},
	{500, -0.2, 0.2, 0.25, 0.3, 0, 0},
	{20, -0.2, 0.1, 0.24, 0.4, 0.02, 0.01},
	{50, -0.3, 0.1, 0.25, 0.5, 0.1, 0.05},
}

// At the returned point the determinant vanishes, beside it not; without
// structural damping the flow does no net work over a period of the mode.
func TestSectionFlutterIsNeutral(t *testing.T) {
	rows := 0
	for _, s := range flutterSections {
		u, f, k, err := SectionFlutter(s.mu, s.a, s.xAlpha, s.r2, s.ratio, s.zetaH, s.zetaAlpha)
		if err != nil || math.IsInf(u, 0) {
			t.Fatalf("%+v: %g, %v", s, u, err)
		}
		if math.Abs(k*u/f-1) > 1e-12 {
			t.Errorf("%+v: k %g, U %g, ω %g", s, k, u, f)
		}
		here, beside := cmplx.Abs(s.determinant(k, 1/f)), cmplx.Abs(s.determinant(k*1.01, 1/f))
		if here > 1e-9*beside {
			t.Errorf("%+v: determinant %g, beside %g", s, here, beside)
		}
		if s.zetaH == 0 {
			if work, size := sectionWork(s, k, 1/f); math.Abs(work) > 1e-9*size {
				t.Errorf("%+v: work %g of %g", s, work, size)
			}
		}
		rows++
	}
	if rows != 11 {
		t.Errorf("ran %d sections", rows)
	}
	tally(t, "SectionFlutter", "no work over a period at the onset", 9)
}

// sectionWork is the work of the aerodynamic loads over a period of the
// neutral mode, Im(q* A q), and the size of its terms.
func sectionWork(s flutterSection, k, y float64) (work, size float64) {
	re, im := theodorsenC(k)
	c, ik := complex(re, im), complex(0, -1/k)
	lh := 1 + 2*c*ik
	la := complex(-s.a, 0) + ik + 2*c*ik*ik + complex(1-2*s.a, 0)*c*ik
	mh := complex(-s.a, 0) - complex(1+2*s.a, 0)*c*ik
	ma := complex(0.125+s.a*s.a, 0) + complex(0.5-s.a, 0)*ik - complex(1+2*s.a, 0)*c*ik*ik - complex(0.5-2*s.a*s.a, 0)*c*ik
	plunge := complex(s.mu*(1-s.ratio*s.ratio*y*y), 0) + lh
	h := -(complex(s.mu*s.xAlpha, 0) + la) / plunge // for unit pitch
	for _, w := range []complex128{cmplx.Conj(h) * lh * h, cmplx.Conj(h) * la, mh * h, ma} {
		work += imag(w)
		size += cmplx.Abs(w)
	}
	return work, size
}

// jonesGrowth is the largest growth rate of an oscillation at the speed U/(bω_α)
// with Jones' rational approximation of C (1940, from memory):
// (0.5p² + 0.2808p + 0.01365)/(p² + 0.3455p + 0.01365), p = sb/U.
func jonesGrowth(s flutterSection, speed float64) float64 {
	type poly = []float64
	add := func(a, b poly) poly {
		out := make(poly, max(len(a), len(b)))
		for i, v := range a {
			out[i] += v
		}
		for i, v := range b {
			out[i] += v
		}
		return out
	}
	mul := func(a, b poly) poly {
		out := make(poly, len(a)+len(b)-1)
		for i, v := range a {
			for j, w := range b {
				out[i+j] += v * w
			}
		}
		return out
	}
	num, den := poly{0.01365, 0.2808, 0.5}, poly{0.01365, 0.3455, 1}
	// Each element times p²·den: structure and apparent mass, circulation.
	element := func(plain, circulation poly) poly { return add(mul(plain, den), mul(circulation, num)) }
	v2, half, aft := 1/(speed*speed), 0.5-s.a, 0.5+s.a
	hh := element(poly{s.mu * s.ratio * s.ratio * v2, 2 * s.mu * s.zetaH * s.ratio / speed, s.mu + 1}, poly{0, 2})
	ha := element(poly{0, 1, s.mu*s.xAlpha - s.a}, poly{2, 2 * half})
	ah := element(poly{0, 0, s.mu*s.xAlpha - s.a}, poly{0, -2 * aft})
	aa := element(poly{s.mu * s.r2 * v2, half + 2*s.mu*s.r2*s.zetaAlpha/speed, s.mu*s.r2 + 0.125 + s.a*s.a}, poly{-2 * aft, -2 * aft * half})
	minus := mul(ha, ah)
	for i := range minus {
		minus[i] = -minus[i]
	}
	det := add(mul(hh, aa), minus)
	n := len(det) - 1
	companion := mat.NewDense(n, n, nil)
	for i := range n {
		if i > 0 {
			companion.Set(i, i-1, 1)
		}
		companion.Set(i, n-1, -det[i]/det[n])
	}
	var eig mat.Eigen
	eig.Factorize(companion, mat.EigenNone)
	growth := math.Inf(-1)
	for _, p := range eig.Values(nil) {
		if imag(p) > 1e-3/speed {
			growth = max(growth, real(p)*speed)
		}
	}
	return growth
}

// An independent model: with a rational C the eigenvalues are stable below the
// onset and unstable above it, within the error of the approximation.
func TestSectionFlutterIsTheLowestOnset(t *testing.T) {
	rows := 0
	for _, s := range flutterSections {
		u, _, _, err := SectionFlutter(s.mu, s.a, s.xAlpha, s.r2, s.ratio, s.zetaH, s.zetaAlpha)
		if err != nil {
			t.Fatal(err)
		}
		for i := 1; i <= 60; i++ {
			if at := 0.96 * u * float64(i) / 60; jonesGrowth(s, at) > 0 {
				t.Errorf("%+v: unstable at %g, below the onset %g", s, at, u)
				break
			}
		}
		if jonesGrowth(s, 1.04*u) <= 0 {
			t.Errorf("%+v: stable above the onset %g", s, u)
		}
		rows++
	}
	if rows != 11 {
		t.Errorf("ran %d sections", rows)
	}
	tally(t, "SectionFlutter", "eigenvalues with a rational C", rows)
}

// unstableModes counts the growing motions at the speed U/(bω_α) with the exact
// C, by the argument principle: along p = ik the phase of k⁴ times the
// determinant, which is analytic to the right, turns by 2π − πN.
func unstableModes(s flutterSection, speed float64) int {
	value := func(logK float64) complex128 {
		k := math.Exp(logK)
		return s.determinant(k, 1/(k*speed))
	}
	var turn func(a, b float64, va, vb complex128, depth int) float64
	turn = func(a, b float64, va, vb complex128, depth int) float64 {
		m := (a + b) / 2
		vm := value(m)
		first, second := cmplx.Phase(vm/va), cmplx.Phase(vb/vm)
		if depth > 40 || (depth > 1 && math.Abs(first) < 0.3 && math.Abs(second) < 0.3) {
			return first + second
		}
		return turn(a, m, va, vm, depth+1) + turn(m, b, vm, vb, depth+1)
	}
	// Near a lightly damped resonance the phase turns by π within a narrow
	// range of k: the points close in on each.
	points := []float64{math.Log(1e-5), math.Log(1e4)}
	for k := 1e-5; k < 1e4; k *= 1.1 {
		points = append(points, math.Log(k))
	}
	for branch := range 2 {
		k := 1 / speed
		for range 60 {
			c := s.coefficients(k)
			k = math.Sqrt(k / (real(s.branches(&c)[branch]) * speed))
		}
		for d := 1.0; d > 1e-9; d /= 2 {
			points = append(points, math.Log(k)-d, math.Log(k)+d)
		}
	}
	slices.Sort(points)
	phase := 0.0
	for i := 1; i < len(points); i++ {
		phase += turn(points[i-1], points[i], value(points[i-1]), value(points[i]), 0)
	}
	return 2 - int(math.Round(phase/math.Pi))
}

// Over the whole field of sections, by the exact count: no growing oscillation
// anywhere below the onset, two conjugate ones just above it. A single one is
// static divergence.
func TestSectionFlutterField(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := flutterSection{
			mu: math.Pow(10, rapid.Float64Range(0, 2.5).Draw(t, "log μ")), a: rapid.Float64Range(-0.6, 0.3).Draw(t, "a"),
			xAlpha: rapid.Float64Range(-0.1, 0.4).Draw(t, "x_α"), r2: rapid.Float64Range(0.2, 0.5).Draw(t, "r²"),
			ratio: rapid.Float64Range(0.1, 1.5).Draw(t, "σ"), zetaH: rapid.Float64Range(0, 0.05).Draw(t, "ζ_h"), zetaAlpha: rapid.Float64Range(0, 0.05).Draw(t, "ζ_α"),
		}
		u, _, _, err := SectionFlutter(s.mu, s.a, s.xAlpha, s.r2, s.ratio, s.zetaH, s.zetaAlpha)
		if err != nil {
			t.Fatal(err)
		}
		divergence, err := SectionDivergenceSpeed(s.mu, s.a, s.r2, 2*math.Pi, 0)
		if err != nil {
			t.Fatal(err)
		}
		static := func(at float64) int {
			if at > divergence {
				return 1
			}
			return 0
		}
		top := min(u, 20)
		for i := 1; i <= 12; i++ {
			at := 0.9999 * top * float64(i) / 12
			if at < 0.04 || math.Abs(at/divergence-1) < 1e-3 { // k beyond the range, or on the static limit
				continue
			}
			if n := unstableModes(s, at); n != static(at) {
				t.Fatalf("%+v: %d growing motions at %g, onset %g, divergence %g", s, n, at, u, divergence)
			}
		}
		if above := 1.0001 * u; u < 20 && math.Abs(above/divergence-1) > 1e-3 {
			if n := unstableModes(s, above); n != 2+static(above) {
				t.Fatalf("%+v: %d growing motions above the onset %g", s, n, u)
			}
		}
	})
	tally(t, "SectionFlutter", "number of growing motions by the argument principle", 1)
}

func TestSectionFlutterLimits(t *testing.T) {
	// Centre of gravity and elastic axis on the quarter chord: no flutter.
	u, f, k, err := SectionFlutter(20, -0.5, 0, 0.25, 0.4, 0, 0)
	if !math.IsInf(u, 1) || f != 0 || k != 0 || err != nil {
		t.Errorf("balanced section: %g %g %g %v", u, f, k, err)
	}
	// Damping is continuous at zero, and raises the speed of this section.
	bare, _, _, _ := SectionFlutter(20, -0.2, 0.1, 0.24, 0.4, 0, 0)
	tiny, _, _, _ := SectionFlutter(20, -0.2, 0.1, 0.24, 0.4, 1e-9, 1e-9)
	more, _, _, _ := SectionFlutter(20, -0.2, 0.1, 0.24, 0.4, 0.02, 0.02)
	if math.Abs(tiny/bare-1) > 1e-7 || more <= bare {
		t.Errorf("damping 0, 1e-9, 0.02: %g %g %g", bare, tiny, more)
	}
	for _, s := range []flutterSection{
		{0, 0, 0, 0.2, 1, 0, 0}, {20, 2, 0, 0.2, 1, 0, 0}, {20, 0, 0.5, 0.25, 1, 0, 0}, {20, 0, 0, 0.2, 0, 0, 0}, {20, 0, 0, 0.2, 1, -1, 0}, {20, 0, 0, 0.2, 1, 0, math.NaN()},
	} {
		_, _, _, err := SectionFlutter(s.mu, s.a, s.xAlpha, s.r2, s.ratio, s.zetaH, s.zetaAlpha)
		wantRangeError(t, err)
	}
	tally(t, "SectionFlutter", "balanced section, and no damping", 2)
}

func TestSectionDivergence(t *testing.T) {
	runFlowChecks(t, 1, []flowCheck{{"SectionDivergence", []float64{0.25}, []float64{0.636619772368}, 1e-11}})
	u, err := SectionDivergenceSpeed(20, -0.2, 0.24, 2*math.Pi, 0)
	if err != nil || math.Abs(u/math.Sqrt(8)-1) > 1e-12 {
		t.Errorf("U_D %g, want r√(μ/(1 + 2a)) = %g, %v", u, math.Sqrt(8), err)
	}
	for _, e := range []float64{0, -0.1} {
		if q, err := SectionDivergence(e, 6, 0.3); !math.IsInf(q, 1) || err != nil {
			t.Errorf("e %g: %g, %v", e, q, err)
		}
	}
	// The static determinant of the flutter equations: as k → 0 at fixed kU the
	// pitch stiffness is cancelled at U_D.
	s := flutterSection{20, -0.2, 0.1, 0.24, 0.4, 0, 0}
	const k = 1e-6
	f := k * u
	sign := func(f float64) float64 { return real(s.determinant(k, 1/f)) }
	if sign(f*0.99)*sign(f*1.01) > 0 {
		t.Errorf("no static zero at U_D = %g", u)
	}
	// Prandtl–Glauert lowers it.
	q0, _ := SectionDivergence(0.25, 6, 0)
	q6, _ := SectionDivergence(0.25, 6, 0.6)
	if math.Abs(q6/q0-0.8) > 1e-12 {
		t.Errorf("M 0.6: ratio %g", q6/q0)
	}
	_, err = SectionDivergence(0.25, 6, 0.8)
	wantRangeError(t, err)
	_, err = SectionDivergence(2, 6, 0)
	wantRangeError(t, err)
	_, err = SectionDivergence(0.1, 0, 0)
	wantRangeError(t, err)
	_, err = SectionDivergenceSpeed(0, 0, 1, 6, 0)
	wantRangeError(t, err)
	_, err = SectionDivergenceSpeed(1, 2, 1, 6, 0)
	wantRangeError(t, err)
	_, err = SectionDivergenceSpeed(1, 0, 0, 6, 0)
	wantRangeError(t, err)
	tally(t, "SectionDivergence", "2/π, and r√(μ/(1 + 2a)) of the typical section", 2)
	tally(t, "SectionDivergence", "static zero of the flutter determinant", 1)
}

func BenchmarkSectionFlutter(b *testing.B) {
	for b.Loop() {
		flowSink = flutterSection{20, -0.2, 0.1, 0.24, 0.4, 0, 0}.lowest().k
	}
}

func BenchmarkSectionFlutterDamped(b *testing.B) {
	for b.Loop() {
		flowSink = flutterSection{20, -0.2, 0.1, 0.24, 0.4, 0.01, 0.01}.lowest().k
	}
}
