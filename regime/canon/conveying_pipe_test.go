package canon

import (
	"math"
	"math/cmplx"
	"testing"
)

// Values computed independently to 30 digits.
func TestConveyingPipeCheckValues(t *testing.T) {
	const tol = 1e-9
	runFlowChecks(t, 10, []flowCheck{
		{"ConveyingPipe", []float64{0.05, 0, 0}, []float64{4.44489631346, 14.4410474529}, tol},
		{"ConveyingPipe", []float64{0.1, 0, 0}, []float64{4.74989677311, 14.2171025845}, tol},
		{"ConveyingPipe", []float64{0.2, 0, 0}, []float64{5.59140437783, 13.7146998005}, tol},
		{"ConveyingPipe", []float64{0.4, 0, 0}, []float64{8.77815918158, 26.0698562147}, tol},
		{"ConveyingPipe", []float64{0.5, 0, 0}, []float64{9.32241843278, 26.4973284619}, tol},
		{"ConveyingPipe", []float64{0.6, 0, 0}, []float64{9.99135164252, 26.2960663226}, tol},
		{"ConveyingPipe", []float64{0.8, 0, 0}, []float64{13.493130501, 44.8297806814}, tol},
		{"ConveyingPipe", []float64{0.2, 10, 0}, []float64{6.33979801811, 15.0165433757}, tol},
		{"ConveyingPipe", []float64{0.5, 10, 0}, []float64{9.83483111507, 27.9570751006}, tol},
		{"ConveyingPipe", []float64{0.2, -5, 0}, []float64{5.22794287938, 13.0637676438}, tol},
	})
}

// Supported pipes buckle at π, 2π and 4.4934 (Païdoussis 1998, from memory);
// the static determinant finds the same without the closed form.
func TestConveyingPipeBuckling(t *testing.T) {
	runFlowChecks(t, 3, []flowCheck{
		{"ConveyingPipe", []float64{0.3, 0, 0, 1}, []float64{math.Pi, 0}, 1e-14},
		{"ConveyingPipe", []float64{0.3, 0, 0, 2}, []float64{2 * math.Pi, 0}, 1e-14},
		{"ConveyingPipe", []float64{0.3, 0, 0, 3}, []float64{4.4934, 0}, 1e-5},
	})
	rows := 0
	for _, s := range []PipeSupport{PipePinnedPinned, PipeClampedClamped, PipeClampedPinned} {
		u0, _, _ := ConveyingPipe(0.3, 0, 0, s)
		previous := 0.0
		for _, gamma := range []float64{-15, -1e-9, 0, 1e-9, 15, 100} {
			u, omega, err := ConveyingPipe(0.3, gamma, 0.01, s)
			if err != nil || omega != 0 {
				t.Fatalf("%s γ %g: %g %g %v", s, gamma, u, omega, err)
			}
			if u < previous-1e-9 || (math.Abs(gamma) < 1e-6 && math.Abs(u-u0) > 1e-9) {
				t.Errorf("%s γ %g: u %g after %g", s, gamma, u, previous)
			}
			previous = u
			rows++
		}
	}
	if rows != 18 {
		t.Errorf("ran %d rows", rows)
	}
	tally(t, "ConveyingPipe", "supported pipes π, 2π, 4.4934", 3)
}

// Weights under which a column buckles (Timoshenko & Gere, from memory: 7.837
// cantilever, 18.57 pinned, 74.6 clamped, 52.5 clamped–pinned).
func TestPipeOwnWeight(t *testing.T) {
	rows := 0
	for support, limit := range pipeOwnWeight {
		static := func(gamma float64) float64 {
			if support == PipeCantilever {
				return real(conveyingPipe{0.3, gamma, 0}.determinantBySeries(0, 0))
			}
			return pipeStaticDeterminant(0, gamma, support)
		}
		if static(limit+1e-3)*static(limit-1e-3) > 0 {
			t.Errorf("%s: no zero of the static determinant at γ = %g", support, limit)
		}
		if static(limit/2)*static(limit/4) < 0 {
			t.Errorf("%s: a zero above γ = %g", support, limit)
		}
		_, _, err := ConveyingPipe(0.3, limit-0.01, 0, support)
		wantRangeError(t, err)
		rows++
	}
	if rows != 4 {
		t.Errorf("ran %d supports", rows)
	}
	// Just above its limit the determinate pipe buckles at a low speed.
	u, _, err := ConveyingPipe(0.3, pipeOwnWeight[PipePinnedPinned]+0.01, 0, PipePinnedPinned)
	if err != nil || u > 0.2 {
		t.Errorf("pinned at its own weight: %g, %v", u, err)
	}
	tally(t, "ConveyingPipe", "columns under their own weight", rows)
}

// At the returned point the determinant vanishes, by its two independent
// expressions, and the projection has a neutral eigenvalue there.
func TestConveyingPipeDeterminants(t *testing.T) {
	rows := 0
	for _, beta := range []float64{0.01, 0.15, 0.35, 0.55, 0.75, 0.85, 0.95} {
		for _, alpha := range []float64{0, 0.002} {
			p := conveyingPipe{beta, 0, alpha}
			u, omega, err := ConveyingPipe(beta, 0, alpha, PipeCantilever)
			if err != nil {
				t.Fatal(err)
			}
			for name, det := range map[string]func(float64, complex128) complex128{
				"roots": p.determinantByRoots, "series": p.determinantBySeries,
			} {
				here := cmplx.Abs(det(u, complex(omega, 0)))
				beside := cmplx.Abs(det(1.001*u, complex(omega, 0)))
				if here > 1e-5*beside {
					t.Errorf("β %g α %g: determinant by %s %g, beside %g", beta, alpha, name, here, beside)
				}
			}
			s := &pipeSearch{pipe: p, m: pipeProjection()}
			if g := s.at(u); math.Abs(g.growth) > 2e-3*omega || math.Abs(g.omega-omega) > 2e-3*omega {
				t.Errorf("β %g α %g: projection %+v at u %g ω %g", beta, alpha, g, u, omega)
			}
			rows++
		}
	}
	if rows != 14 {
		t.Errorf("ran %d rows", rows)
	}
	tally(t, "ConveyingPipe", "two determinants and the projection agree", 3*rows)
}

// Energy: over a period at the onset the fluid does no net work on a cantilever
// without damping, ∫(η̇² + u η̇η′/√β)dt at ξ = 1 vanishes, so that
// Re(η̇*·η′)/|η̇|² = −√β/u at the free end (Benjamin's condition).
func TestConveyingPipeDoesNoNetWorkAtOnset(t *testing.T) {
	rows := 0
	for _, beta := range []float64{0.1, 0.2, 0.4, 0.6, 0.8} {
		u, omega, err := ConveyingPipe(beta, 0, 0, PipeCantilever)
		if err != nil {
			t.Fatal(err)
		}
		p := conveyingPipe{beta, 0, 0}
		tip, slope := pipeTip(p, u, omega)
		velocity := complex(0, omega) * tip
		got := real(cmplx.Conj(velocity)*slope) / real(velocity*cmplx.Conj(velocity))
		if want := -math.Sqrt(beta) / u; math.Abs(got/want-1) > 1e-6 {
			t.Errorf("β %g: Re(η̇*η′)/|η̇|² = %g, want %g", beta, got, want)
		}
		rows++
	}
	if rows != 5 {
		t.Errorf("ran %d rows", rows)
	}
	tally(t, "ConveyingPipe", "no work over a period at the onset", rows)
}

// pipeTip gives deflection and slope at the free end of the neutral mode.
func pipeTip(p conveyingPipe, u, omega float64) (tip, slope complex128) {
	k := quarticRoots(0, complex(-u*u, 0), complex(-2*math.Sqrt(p.beta)*u*omega, 0), complex(-omega*omega, 0))
	// Amplitudes from η(0) = η′(0) = η″(1) = 0 with the fourth set to 1.
	var m [3][4]complex128
	for j := range k {
		m[0][j], m[1][j], m[2][j] = 1, k[j], k[j]*k[j]*cmplx.Exp(1i*k[j])
	}
	det := func(c [3]int) complex128 {
		a, b, d := m[0], m[1], m[2]
		return a[c[0]]*(b[c[1]]*d[c[2]]-b[c[2]]*d[c[1]]) - a[c[1]]*(b[c[0]]*d[c[2]]-b[c[2]]*d[c[0]]) + a[c[2]]*(b[c[0]]*d[c[1]]-b[c[1]]*d[c[0]])
	}
	amplitudes := [4]complex128{det([3]int{1, 2, 3}), -det([3]int{0, 2, 3}), det([3]int{0, 1, 3}), -det([3]int{0, 1, 2})}
	for j := range k {
		wave := amplitudes[j] * cmplx.Exp(1i*k[j])
		tip += wave
		slope += 1i * k[j] * wave
	}
	return tip, slope
}

// Over β the onset rises with two or three jumps, at which the lowest branch
// ends; between them it is continuous. Gregory & Païdoussis 1966 (from memory)
// have the jumps near 0.30, 0.69 and 0.92.
func TestConveyingPipeJumps(t *testing.T) {
	var jumps []float64
	previous := 0.0
	rows := 0
	for beta := 0.005; beta < 0.9501; beta += 0.0025 {
		u, omega, err := ConveyingPipe(beta, 0, 0, PipeCantilever)
		if err != nil || u < 4 || omega < 5 {
			t.Fatalf("β %g: u %g ω %g, %v", beta, u, omega, err)
		}
		if previous > 0 && u-previous > 0.3 {
			jumps = append(jumps, beta)
		}
		if u < previous-1e-9 {
			t.Errorf("β %g: the lowest u falls from %g to %g", beta, previous, u)
		}
		previous = u
		rows++
	}
	t.Logf("%d values of β, jumps at %.4v", rows, jumps)
	if rows < 378 || len(jumps) != 3 {
		t.Fatalf("%d rows, jumps at %v", rows, jumps)
	}
	for i, want := range []float64{0.30, 0.69, 0.92} {
		if math.Abs(jumps[i]-want) > 0.03 {
			t.Errorf("jump %d at β %g, want %g", i, jumps[i], want)
		}
	}
	tally(t, "ConveyingPipe", "jumps over β", 3)
}

// The branch that ends at a fold is followed to it: its two solutions meet there.
func TestConveyingPipeFold(t *testing.T) {
	lo, hi := 0.28, 0.30
	for hi-lo > 1e-5 {
		mid := (lo + hi) / 2
		if u, _, _ := ConveyingPipe(mid, 0, 0, PipeCantilever); u < 8 {
			lo = mid
		} else {
			hi = mid
		}
	}
	u, omega, err := ConveyingPipe(lo, 0, 0, PipeCantilever)
	if err != nil {
		t.Fatal(err)
	}
	// At the fold the determinant's Jacobian in u, ω vanishes.
	jacobian := func(beta, u, omega float64) float64 {
		p := conveyingPipe{beta, 0, 0}
		const h = 1e-5
		d := p.determinant(u, complex(omega, 0))
		du := (p.determinant(u+h, complex(omega, 0)) - d) / h
		dω := (p.determinant(u, complex(omega+h, 0)) - d) / h
		return imag(cmplx.Conj(du)*dω) / (cmplx.Abs(du) * cmplx.Abs(dω))
	}
	away, wAway, _ := ConveyingPipe(lo-0.05, 0, 0, PipeCantilever)
	t.Logf("fold at β %.5f, u %.4f, ω %.4f; Jacobian %.2g, away from it %.2g", lo, u, omega, jacobian(lo, u, omega), jacobian(lo-0.05, away, wAway))
	if math.Abs(jacobian(lo, u, omega)) > 0.1*math.Abs(jacobian(lo-0.05, away, wAway)) {
		t.Errorf("the lowest branch is left at β %g before its fold", lo)
	}
	tally(t, "ConveyingPipe", "the lowest branch lasts to its fold", 1)
}

// Beck's column (β → 0): with vanishing Coriolis damping the onset lies below
// 20.05, with vanishing internal damping at 10.94 (Bolotin, from memory), both
// u².
func TestConveyingPipeFollowerForce(t *testing.T) {
	u, _, err := ConveyingPipe(1e-4, 0, 0, PipeCantilever)
	if err != nil || u*u > 20.05 || u*u < 16 {
		t.Errorf("β → 0: u² %g, %v", u*u, err)
	}
	u, _, err = pipeFlutter(conveyingPipe{1e-12, 0, 1e-3})
	if err != nil || math.Abs(u*u-10.94) > 0.01 {
		t.Errorf("β → 0, internal damping: u² %g, %v", u*u, err)
	}
	tally(t, "ConveyingPipe", "Beck's column", 2)
}

func TestConveyingPipeWholeRange(t *testing.T) {
	rows := 0
	for _, beta := range []float64{1e-4, 0.03, 0.3, 0.5, 0.7, 0.95} {
		for _, gamma := range []float64{-7.83, -5, -1, 1, 10, 40, 100} {
			for _, alpha := range []float64{0, 1e-3, 0.1} {
				rows++
				u, omega, err := ConveyingPipe(beta, gamma, alpha, PipeCantilever)
				if beta > 0.9 && gamma > 40 && err != nil {
					wantRangeError(t, err)
					continue
				}
				if err != nil || !(u > 0 && u < pipeSpeedEnd) || !(omega >= 0) {
					t.Errorf("β %g γ %g α %g: u %g ω %g, %v", beta, gamma, alpha, u, omega, err)
				}
				p := conveyingPipe{beta, gamma, alpha}
				if here, beside := cmplx.Abs(p.determinant(u, complex(omega, 0))), cmplx.Abs(p.determinant(1.001*u, complex(omega, 0))); here > 1e-4*beside {
					t.Errorf("β %g γ %g α %g: determinant %g at u %g, beside %g", beta, gamma, alpha, here, u, beside)
				}
			}
		}
	}
	if rows != 126 {
		t.Errorf("ran %d rows", rows)
	}
	for _, bad := range [][3]float64{{0, 0, 0}, {1, 0, 0}, {0.5, 101, 0}, {0.5, 0, -1}, {math.NaN(), 0, 0}} {
		_, _, err := ConveyingPipe(bad[0], bad[1], bad[2], PipeCantilever)
		wantRangeError(t, err)
	}
	_, _, err := ConveyingPipe(0.5, 0, 0, "glued")
	wantRangeError(t, err)
}

// The onsets from which the search begins are onsets, rise with β and γ, and change
// no answer: the search from the beginning finds the same.
func TestConveyingPipeSearchStart(t *testing.T) {
	ran := 0
	full := func(p conveyingPipe) float64 {
		s := &pipeSearch{pipe: p, m: pipeProjection()}
		last := s.at(pipeQuiet(p))
		before := pipeState{}
		for last.u < pipeSpeedEnd {
			next := s.at(last.u + last.step())
			if crest, found := s.crest(before, last, next); found {
				if u, _, err := s.refine(before, crest); err == nil {
					return u
				}
			}
			if next.growth > 0 {
				if u, _, err := s.refine(last, next); err == nil {
					return u
				}
			}
			before, last = last, next
		}
		return pipeSpeedEnd
	}
	for i, beta := range pipeOnsetBeta {
		for j, gamma := range pipeOnsetGamma {
			known := pipeOnsets[i][j]
			if u := full(conveyingPipe{beta, gamma, 0}); math.Abs(u-known) > 2e-3 && !(u == pipeSpeedEnd && known > u) {
				t.Errorf("β %g γ %g: onset %g, listed %g", beta, gamma, u, known)
			}
			if i > 0 && known < pipeOnsets[i-1][j] || j > 0 && known < pipeOnsets[i][j-1] {
				t.Errorf("β %g γ %g: %g lies below a smaller one", beta, gamma, known)
			}
			ran++
		}
	}
	for _, p := range []conveyingPipe{{0.07, 3, 0}, {0.23, 25, 0}, {0.297, 0, 0}, {0.298, 0, 0}, {0.25, 12, 0}, {0.62, 7, 0}, {0.69, 0, 0}, {0.71, 39, 0}, {0.88, 5, 0}, {0.95, 0, 0}, {0.95, 30, 0},
		{0.06, 1, 0.1}, {0.19, 9, 0.01}, {0.299, 0, 1e-3}, {0.31, 0, 0.02}, {0.54, 0, 2e-3}, {0.69, 39, 0.05}, {0.75, 0, 3e-4}, {0.89, 99, 0.1}, {0.95, 0, 1e-5}, {0.95, 100, 0.03}} {
		u, _, err := ConveyingPipe(p.beta, p.gamma, p.alpha, PipeCantilever)
		if want := full(p); err != nil || math.Abs(u-want) > 1e-8 {
			t.Errorf("%+v: %g, %v; from the beginning %g", p, u, err, want)
		}
		ran++
	}
	for i, beta := range pipeOnsetBeta {
		for j, gamma := range pipeOnsetGamma {
			known, least := pipeLeastOnsets[i][j], pipeOnsets[i][j]
			for _, alpha := range []float64{1e-4, 1e-3, 3e-3, 0.01, 0.03, 0.1} {
				least = min(least, full(conveyingPipe{beta, gamma, alpha}))
			}
			if least < known-2e-3 || least > 1.01*known {
				t.Errorf("β %g γ %g: least onset over the damping %g, listed %g", beta, gamma, least, known)
			}
			if i > 0 && known < pipeLeastOnsets[i-1][j] || j > 0 && known < pipeLeastOnsets[i][j-1] {
				t.Errorf("β %g γ %g, damped: %g lies below a smaller one", beta, gamma, known)
			}
			ran++
		}
	}
	if ran != 109 {
		t.Errorf("ran %d rows, want 109", ran)
	}
}

func TestQuarticRoots(t *testing.T) {
	rows := 0
	for _, want := range [][4]complex128{
		{1, 2, 3, 4}, {1i, -1i, 2, -2}, {1 + 2i, -3 + 0.5i, 0.01, 1e3}, {0, 0, 0, 0}, {1, 1, 2, 3},
	} {
		a, b, c, d := want[0], want[1], want[2], want[3]
		got := quarticRoots(-(a + b + c + d), a*b+a*c+a*d+b*c+b*d+c*d, -(a*b*c + a*b*d + a*c*d + b*c*d), a*b*c*d)
		for _, w := range want {
			nearest := math.Inf(1)
			for _, g := range got {
				nearest = min(nearest, cmplx.Abs(g-w))
			}
			if nearest > 1e-6*(1+cmplx.Abs(w)) {
				t.Errorf("roots %v, want %v", got, want)
			}
		}
		rows++
	}
	if rows != 5 {
		t.Errorf("ran %d rows", rows)
	}
}

func BenchmarkConveyingPipe(b *testing.B) {
	for name, args := range map[string][3]float64{
		"beta=0.2": {0.2, 0, 0}, "beta=0.5": {0.5, 0, 0}, "beta=0.8": {0.8, 0, 0}, "beta=0.95": {0.95, 0, 0},
		"beta=0.5,gamma=10": {0.5, 10, 0}, "beta=0.9,gamma=100": {0.9, 100, 0}, "beta=0.2,gamma=-5": {0.2, -5, 0},
	} {
		b.Run(name, func(b *testing.B) {
			for b.Loop() {
				flowSink, _, _ = pipeFlutter(conveyingPipe{args[0], args[1], args[2]})
			}
		})
	}
}
