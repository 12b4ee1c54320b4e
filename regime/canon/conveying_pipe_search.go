package canon

import (
	"math"
	"sync"

	"gonum.org/v1/gonum/integrate/quad"
	"gonum.org/v1/gonum/lapack"
	"gonum.org/v1/gonum/lapack/gonum"
)

// pipeTerms is the largest number of polynomials of the projection that
// brackets the onset; the determinant then refines it.
const pipeTerms = 20

// termsAt is the number that resolves the waves at the speed u: their number
// and their growth along the pipe rise with it.
func (p conveyingPipe) termsAt(u float64) int {
	return min(max(8, 5+int(math.Sqrt(u*u+math.Abs(p.gamma))/1.6)), pipeTerms)
}

// pipeMatrices are the projections of the cantilever's operators on orthonormal
// polynomials ξ²pᵢ(ξ): bending, follower force, gravity and Coriolis.
type pipeMatrices struct {
	bending, follower, gravity, coriolis [pipeTerms][pipeTerms]float64
}

var pipeProjection = sync.OnceValue(newPipeMatrices)

func newPipeMatrices() *pipeMatrices {
	const nodes = pipeTerms + 4
	x, w := make([]float64, nodes), make([]float64, nodes)
	quad.Legendre{}.FixedLocations(x, w, 0, 1)
	var m pipeMatrices
	shapes := clampedPolynomials(x, w)
	for q := range x {
		for i := range pipeTerms {
			fi := shapes[q][i]
			for j := range pipeTerms {
				fj := shapes[q][j]
				m.bending[i][j] += w[q] * fi[2] * fj[2]
				m.follower[i][j] += w[q] * fi[0] * fj[2]
				m.gravity[i][j] += w[q] * (1 - x[q]) * fi[1] * fj[1]
				m.coriolis[i][j] += w[q] * fi[0] * fj[1]
			}
		}
	}
	return &m
}

// clampedPolynomials gives value, slope and curvature of the first orthonormal
// polynomials ξ²pᵢ(ξ) at the nodes, by Stieltjes' recurrence with weight ξ⁴.
func clampedPolynomials(x, w []float64) [][pipeTerms][3]float64 {
	shapes := make([][pipeTerms][3]float64, len(x))
	p := make([][3]float64, len(x)) // pᵢ, pᵢ′, pᵢ″, orthonormal
	prev := make([][3]float64, len(x))
	var b float64
	norm := 0.0
	for q := range x {
		norm += w[q] * math.Pow(x[q], 4)
	}
	for q := range p {
		p[q][0] = 1 / math.Sqrt(norm)
	}
	for i := range pipeTerms {
		var a float64
		for q, ξ := range x {
			f := p[q]
			shapes[q][i] = [3]float64{ξ * ξ * f[0], 2*ξ*f[0] + ξ*ξ*f[1], 2*f[0] + 4*ξ*f[1] + ξ*ξ*f[2]}
			a += w[q] * math.Pow(ξ, 5) * f[0] * f[0]
		}
		next := make([][3]float64, len(x))
		norm = 0
		for q, ξ := range x {
			f, g := p[q], prev[q]
			next[q] = [3]float64{
				(ξ-a)*f[0] - b*g[0],
				f[0] + (ξ-a)*f[1] - b*g[1],
				2*f[1] + (ξ-a)*f[2] - b*g[2],
			}
			norm += w[q] * math.Pow(ξ, 4) * next[q][0] * next[q][0]
		}
		b = math.Sqrt(norm)
		for q := range next {
			for d := range next[q] {
				next[q][d] /= b
			}
		}
		prev, p = p, next
	}
	return shapes
}

// pipeSearch brackets the onset of flutter with the eigenvalues of the projection.
type pipeSearch struct {
	pipe   conveyingPipe
	m      *pipeMatrices
	a      [4 * pipeTerms * pipeTerms]float64
	wr, wi [2 * pipeTerms]float64
	work   [32 * pipeTerms]float64
}

// pipeState is the least stable eigenvalue at one speed.
type pipeState struct{ u, growth, omega float64 }

func (s *pipeSearch) at(u float64) pipeState {
	terms := s.pipe.termsAt(u)
	n := 2 * terms
	clear(s.a[:n*n])
	coriolis := 2 * math.Sqrt(s.pipe.beta) * u
	for i := range terms {
		s.a[i*n+terms+i] = 1
		row := s.a[(terms+i)*n : (terms+i+1)*n]
		for j := range terms {
			row[j] = -(s.m.bending[i][j] + u*u*s.m.follower[i][j] + s.pipe.gamma*s.m.gravity[i][j])
			row[terms+j] = -(s.pipe.alpha*s.m.bending[i][j] + coriolis*s.m.coriolis[i][j])
		}
	}
	gonum.Implementation{}.Dgeev(lapack.LeftEVNone, lapack.RightEVNone, n, s.a[:n*n], n, s.wr[:n], s.wi[:n], nil, 1, nil, 1, s.work[:], len(s.work))
	worst := pipeState{u: u, growth: math.Inf(-1)}
	for i, g := range s.wr[:n] {
		if g > worst.growth {
			worst.growth, worst.omega = g, math.Abs(s.wi[i])
		}
	}
	return worst
}

// Steps of the search in u. Growth against speed has waves no shorter than 1.5
// for any β, so that 0.25 shows each crest, and steps may be longer where all
// modes are well damped.
const (
	pipeSpeedEnd    = 32.0
	pipeFineStep    = 0.25
	pipeCoarseStep  = 0.5
	pipeLongStep    = 0.75
	pipeNearNeutral = -1.0
	pipeFarNeutral  = -3.0
)

func (s pipeState) step() float64 {
	switch {
	case s.growth > pipeNearNeutral:
		return pipeFineStep
	case s.growth > pipeFarNeutral:
		return pipeCoarseStep
	}
	return pipeLongStep
}

// pipeFlutter marches up in speed to the first loss of stability. A crest of
// the growth rate just below zero is looked at more closely, since a short
// range of instability may lie there.
func pipeFlutter(p conveyingPipe) (u, omega float64, err error) {
	s := &pipeSearch{pipe: p, m: pipeProjection()}
	before := pipeState{}
	last := s.at(pipeSearchStart(p))
	if last.growth > 0 { // the known onsets were no bound: from the beginning
		last = s.at(pipeQuiet(p))
	}
	if last.growth > 0 {
		return s.refine(pipeState{growth: -last.growth, omega: last.omega}, last)
	}
	for last.u < pipeSpeedEnd {
		next := s.at(last.u + last.step())
		if crest, found := s.crest(before, last, next); found {
			if u, omega, err := s.refine(before, crest); err == nil {
				return u, omega, nil
			}
		}
		if last.growth <= 0 && next.growth > 0 {
			if u, omega, err := s.refine(last, next); err == nil {
				return u, omega, nil
			}
		}
		before, last = last, next
	}
	return 0, 0, pipeUnresolved(p)
}

// pipeQuiet is a speed below any onset: without upright weight nothing happens
// below u = 3.3, Beck's column with internal damping.
func pipeQuiet(p conveyingPipe) float64 {
	if p.gamma < 0 {
		return 0.05
	}
	if p.alpha > 0 {
		return 3
	}
	return 3.5
}

// pipeOnsets are onsets without damping, found from pipeQuiet on, over β and γ.
// They rise with both; a test holds them to that.
var (
	pipeOnsetBeta  = [...]float64{0.05, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 0.93}
	pipeOnsetGamma = [...]float64{0, 10, 40, 100}
	pipeOnsets     = [...][len(pipeOnsetGamma)]float64{
		{4.444, 4.859, 5.975, 7.897}, {4.749, 5.230, 6.567, 9.459}, {5.591, 6.339, 9.201, 10.575}, {8.269, 8.702, 9.668, 11.505},
		{8.778, 9.189, 10.410, 13.899}, {9.322, 9.834, 11.740, 14.725}, {9.991, 10.714, 13.714, 17.627}, {12.769, 13.258, 14.671, 18.914},
		{13.493, 14.051, 17.983, 22.991}, {14.330, 17.699, 22.869, 32.088}, {17.443, 18.101, 27.824, 32.088}, // the last beyond u = 32, with what is known
	}
)

// pipeLeastOnsets are the least onsets over all dampings α up to 0.1, over the
// same β and γ: a little damping can destabilise. They too rise with both.
var pipeLeastOnsets = [...][len(pipeOnsetGamma)]float64{
	{4.444, 4.859, 5.975, 7.897}, {4.749, 5.230, 6.567, 9.136}, {5.591, 6.339, 8.454, 10.575}, {7.108, 7.866, 9.491, 11.505},
	{7.813, 8.539, 10.219, 12.589}, {8.146, 8.874, 10.580, 13.049}, {8.310, 9.027, 10.699, 13.083}, {8.411, 9.113, 10.752, 13.093},
	{8.493, 9.180, 10.791, 13.106}, {8.562, 9.237, 10.826, 13.120}, {8.581, 9.252, 10.836, 13.125},
}

// pipeSearchStart is a speed from which the search may begin: for a pipe which
// is not upright, a little below the onset of the next smaller β and γ that are
// known; it saves most of the way where that is long.
func pipeSearchStart(p conveyingPipe) float64 {
	start := pipeQuiet(p)
	if p.gamma < 0 {
		return start
	}
	onsets := &pipeOnsets
	if p.alpha > 0 {
		onsets = &pipeLeastOnsets
	}
	for i, β := range pipeOnsetBeta {
		for j, γ := range pipeOnsetGamma {
			if β <= p.beta && γ <= p.gamma {
				start = max(start, 0.97*onsets[i][j])
			}
		}
	}
	return start
}

// crest looks for a positive maximum of the growth rate near b, where a, b and c
// are neighbours and all stable.
func (s *pipeSearch) crest(a, b, c pipeState) (pipeState, bool) {
	if !(a.u > 0 && b.growth <= 0 && c.growth <= 0 && b.growth > a.growth && b.growth >= c.growth && b.growth > pipeNearNeutral) {
		return pipeState{}, false
	}
	for range 4 {
		top := s.at(parabolaTop(a, b, c))
		if top.growth > 0 {
			return top, true
		}
		switch {
		case top.growth <= b.growth && top.u < b.u:
			a = top
		case top.growth <= b.growth:
			c = top
		case top.u < b.u:
			b, c = top, b
		default:
			a, b = b, top
		}
	}
	return pipeState{}, false
}

func parabolaTop(a, b, c pipeState) float64 {
	p, q := b.u-a.u, b.u-c.u
	fp, fq := b.growth-c.growth, b.growth-a.growth
	d := p*fp - q*fq
	if d == 0 {
		return (a.u + b.u) / 2
	}
	u := b.u - 0.5*(p*p*fp-q*q*fq)/d
	if math.Abs(u-b.u) < 1e-3*(c.u-a.u) { // not twice the same place
		return b.u + 0.02*(c.u-a.u)
	}
	return min(max(u, a.u), c.u)
}

// pipeUnresolved says that the onset lies beyond u = 32, where twenty
// polynomials no longer resolve the waves.
func pipeUnresolved(p conveyingPipe) error {
	return &RangeError{Function: "ConveyingPipe", Arg: "beta", Value: p.beta, Reason: "no onset found below u = 32"}
}

// refine takes a stable and an unstable speed to the zero of the determinant
// between them, and says so if it has none there.
func (s *pipeSearch) refine(stable, unstable pipeState) (u, omega float64, err error) {
	for range 5 {
		f := stable.growth / (stable.growth - unstable.growth)
		u = stable.u + f*(unstable.u-stable.u)
		if u, omega, ok := s.pipe.solve(u, unstable.omega+(1-f)*(stable.omega-unstable.omega)); ok && u > stable.u-0.05 && u < unstable.u+0.05 {
			return u, omega, nil
		}
		if middle := s.at((stable.u + unstable.u) / 2); middle.growth > 0 {
			unstable = middle
		} else {
			stable = middle
		}
	}
	return 0, 0, pipeUnresolved(s.pipe)
}

// solve refines u and ω with Newton's method on the real and imaginary part of
// the determinant.
func (p conveyingPipe) solve(u, omega float64) (float64, float64, bool) {
	f := func(u, omega float64) complex128 { return p.determinant(u, complex(omega, 0)) }
	for range 25 {
		stepU, stepω, ok := newtonOnPlane(f, u, omega)
		if !ok || math.Abs(stepU) > 2 || math.Abs(stepω) > 20 {
			return 0, 0, false
		}
		u -= stepU
		omega -= stepω
		if math.Abs(stepU) < 1e-11*u && math.Abs(stepω) < 1e-10*(1+omega) {
			return u, math.Abs(omega), u > 0
		}
	}
	return 0, 0, false
}

// newtonOnPlane is one Newton step on the real and imaginary part of f, whose
// derivatives are differences.
func newtonOnPlane(f func(x, y float64) complex128, x, y float64) (stepX, stepY float64, ok bool) {
	const h = 1e-6
	d := f(x, y)
	dx := (f(x+h, y) - d) / h
	dy := (f(x, y+h) - d) / h
	j := real(dx)*imag(dy) - imag(dx)*real(dy)
	if j == 0 || math.IsNaN(j) {
		return 0, 0, false
	}
	stepX = (real(d)*imag(dy) - imag(d)*real(dy)) / j
	stepY = (real(dx)*imag(d) - imag(dx)*real(d)) / j
	return stepX, stepY, true
}
