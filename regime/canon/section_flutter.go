package canon

import (
	"math"
	"math/cmplx"
	"sync"

	"regimed/regime/cite"
)

// SectionFlutter is the lowest speed at which a section with plunge and pitch
// flutters as a thin aerofoil in incompressible flow.
//
//	[μ(1 − σ²y² − 2iζ_hσy) + L_h]·[μr²(1 − y² − 2iζ_αy) + M_α] − [μx_α + L_α]·[μx_α + M_h] = 0, y = ω_α/ω,
//	L_h = 1 − 2iC/k, L_α = −a − i/k − 2C/k² − 2i(½ − a)C/k, M_h = −a + 2i(½ + a)C/k,
//	M_α = ⅛ + a² − i(½ − a)/k + 2(½ + a)C/k² + 2i(¼ − a²)C/k
//
// Symbols: μ = m/(πρb²) [1], b the semichord; a [1], elastic axis behind
// mid-chord in b; x_α [1], centre of gravity behind the elastic axis in b; r²
// [1], moment of inertia about the elastic axis over mb²; σ = ω_h/ω_α [1];
// ζ_h, ζ_α [1], damping ratios of the uncoupled motions; results: U/(bω_α), ω/ω_α, k = ωb/U [1]. No flutter: +Inf, 0, 0.
// Range: 0.05 ≤ μ ≤ 1e4; |a| ≤ 1; |x_α| ≤ 1; 0.01 ≤ r² ≤ 4, x_α² < r²; 0.01 ≤ σ ≤ 10;
// 0 ≤ ζ ≤ 0.3; onsets with k from 1e-3 to 50 are found.
// Accuracy: 1e-9.
// Check: μ 20, a −0.2, x_α 0.1, r² 0.24, σ 0.4: 2.18391495927, 0.648983536806, 0.297165205105.
// Source: Theodorsen & Garrick 1940; Hodges & Pierce 2011 (from memory).
func SectionFlutter(mu, a, xAlpha, r2, ratio, zetaH, zetaAlpha float64) (speed, frequency, k float64, err error) {
	s := flutterSection{mu, a, xAlpha, r2, ratio, zetaH, zetaAlpha}
	if err := s.check(); err != nil {
		return 0, 0, 0, err
	}
	at := sectionFlutterMemo.of(s, s.lowest)
	if at.k == 0 {
		return math.Inf(1), 0, 0, nil
	}
	return 1 / (at.y * at.k), 1 / at.y, at.k, nil
}

// neutralPoint is a reduced frequency and y = ω_α/ω at which the determinant
// vanishes; k = 0: none.
type neutralPoint struct{ k, y float64 }

var sectionFlutterMemo = newSolvedMemo[flutterSection, neutralPoint](1 << 10)

type flutterSection struct{ mu, a, xAlpha, r2, ratio, zetaH, zetaAlpha float64 }

func (s flutterSection) check() error {
	for _, c := range sectionFlutterArgs {
		if err := inRange("SectionFlutter", c.Name, s.arg(c.Name), c.Min, c.Max); err != nil {
			return err
		}
	}
	if s.xAlpha*s.xAlpha >= s.r2 {
		return &RangeError{Function: "SectionFlutter", Arg: "r2", Value: s.r2, Reason: "no positive moment of inertia about the centre of gravity: want r² > x_α²"}
	}
	return nil
}

func (s flutterSection) arg(name string) float64 {
	switch name {
	case "mu":
		return s.mu
	case "a":
		return s.a
	case "x_alpha":
		return s.xAlpha
	case "r2":
		return s.r2
	case "frequency_ratio":
		return s.ratio
	case "damping_plunge":
		return s.zetaH
	}
	return s.zetaAlpha
}

// coefficients of the determinant as a polynomial in y = ω_α/ω, c[n] yⁿ.
func (s flutterSection) coefficients(k float64) [5]complex128 {
	re, im := theodorsenC(k)
	return s.coefficientsWith(k, complex(re, im))
}

// coefficientsWith are the coefficients where C(k) = c is known.
func (s flutterSection) coefficientsWith(k float64, c complex128) [5]complex128 {
	ik := complex(0, -1/k) // 1/(ik)
	half := complex(0.5-s.a, 0)
	aft := complex(0.5+s.a, 0)
	lh := 1 + 2*c*ik
	la := complex(-s.a, 0) + ik + 2*c*ik*ik + 2*half*c*ik
	mh := complex(-s.a, 0) - 2*aft*c*ik
	ma := complex(0.125+s.a*s.a, 0) + half*ik - 2*aft*c*ik*ik - 2*aft*half*c*ik
	mu, r2 := complex(s.mu, 0), complex(s.r2, 0)
	p0, p1, p2 := mu+lh, complex(0, -2*s.zetaH*s.ratio)*mu, complex(-s.ratio*s.ratio, 0)*mu
	q0, q1, q2 := mu*r2+ma, complex(0, -2*s.zetaAlpha)*mu*r2, -mu*r2
	unbalance := mu * complex(s.xAlpha, 0)
	return [5]complex128{
		p0*q0 - (unbalance+la)*(unbalance+mh),
		p0*q1 + p1*q0,
		p0*q2 + p1*q1 + p2*q0,
		p1*q2 + p2*q1,
		p2 * q2,
	}
}

func (s flutterSection) determinant(k, y float64) complex128 {
	c := s.coefficients(k)
	z := complex(y, 0)
	return (((c[4]*z+c[3])*z+c[2])*z+c[1])*z + c[0]
}

// branches are the two roots y with positive real part of the determinant with
// coefficients c. A real root is a neutral motion.
func (s flutterSection) branches(c *[5]complex128) [2]complex128 {
	if s.undamped() { // a quadratic in y²
		b, d := c[2]/c[4], c[0]/c[4]
		root := cmplx.Sqrt(b*b - 4*d)
		if real(b*cmplx.Conj(root)) > 0 { // the larger one first, the other from the product
			root = -root
		}
		first := (-b + root) / 2
		return [2]complex128{cmplx.Sqrt(first), cmplx.Sqrt(d / first)}
	}
	var right [2]complex128
	n := 0
	for _, z := range quarticRoots(c[3]/c[4], c[2]/c[4], c[1]/c[4], c[0]/c[4]) {
		if real(z) > 0 && n < 2 {
			right[n] = z
			n++
		}
	}
	return right
}

func (s flutterSection) undamped() bool { return s.zetaH == 0 && s.zetaAlpha == 0 }

// follow carries both branches on from where they are expected, by Newton's
// method. It is not ok where one ends outside the right half plane, or both end
// in the same root.
func (s flutterSection) follow(c *[5]complex128, expected [2]complex128) (now [2]complex128, ok bool) {
	for b, z := range expected {
		if now[b], ok = quarticNear(c, z); !ok || real(now[b]) <= 0 {
			return now, false
		}
	}
	return now, largerPart(now[0]-now[1]) > 1e-4*largerPart(now[0])
}

// quarticNear is the root of c₄z⁴ + … + c₀ that Newton's method finds from z; not
// ok without convergence to twelve digits.
func quarticNear(c *[5]complex128, z complex128) (complex128, bool) {
	for range 8 {
		p, slope := c[4], complex128(0)
		for n := 3; n >= 0; n-- {
			slope = slope*z + p
			p = p*z + c[n]
		}
		step := p / slope
		z -= step
		switch size := largerPart(step); {
		case math.IsNaN(size):
			return z, false
		case size < 1e-12*largerPart(z): // the square of what is left is rounding
			return z, true
		}
	}
	return z, false
}

// largerPart is the larger of the parts of z, which bound |z| to a factor of √2.
func largerPart(z complex128) float64 { return max(math.Abs(real(z)), math.Abs(imag(z))) }

// Search over k: on a logarithmic grid fine enough for neighbours to be matched.
const (
	sectionFlutterKMin  = 1e-3
	sectionFlutterKMax  = 50.0
	sectionFlutterSteps = 330
)

// sectionFlutterGrid is k with Theodorsen's C(k), the same for every section.
type sectionFlutterGrid struct {
	factor float64
	k      [sectionFlutterSteps + 1]float64
	c      [sectionFlutterSteps + 1]complex128
}

var theodorsenGrid = sync.OnceValue(func() *sectionFlutterGrid {
	g := &sectionFlutterGrid{factor: math.Pow(sectionFlutterKMin/sectionFlutterKMax, 1./sectionFlutterSteps)}
	at := sectionFlutterKMax
	for i := range g.k {
		re, im := theodorsenC(at)
		g.k[i], g.c[i] = at, complex(re, im)
		at *= g.factor
	}
	return g
})

// branchTrail is the last three values of each branch, the latest last.
type branchTrail [2][3]complex128

// next finds both branches at the next k, in the order of the trail.
func (s flutterSection) next(c *[5]complex128, trail *branchTrail, step int) [2]complex128 {
	if step > 1 && !s.undamped() {
		expected := [2]complex128{2*trail[0][2] - trail[0][1], 2*trail[1][2] - trail[1][1]}
		if now, ok := s.follow(c, expected); ok {
			return trail.inOrder(now)
		}
	}
	now := s.branches(c)
	if step == 0 {
		return now
	}
	return trail.inOrder(now)
}

// inOrder gives each branch the value that is nearer to its last.
func (t *branchTrail) inOrder(now [2]complex128) [2]complex128 {
	if cmplx.Abs(now[0]-t[0][2])+cmplx.Abs(now[1]-t[1][2]) > cmplx.Abs(now[1]-t[0][2])+cmplx.Abs(now[0]-t[1][2]) {
		now[0], now[1] = now[1], now[0]
	}
	return now
}

// lowest follows both branches over k, collects where one crosses the real
// axis, and returns the crossing of lowest speed 1/(ky); k = 0: none.
func (s flutterSection) lowest() neutralPoint {
	best, found := math.Inf(1), neutralPoint{}
	keep := func(k, y float64) {
		if k, y, ok := s.solve(k, y); ok && 1/(k*y) < best {
			best, found = 1/(k*y), neutralPoint{k, y}
		}
	}
	grid := theodorsenGrid()
	factor := grid.factor
	var trail branchTrail
	for step, at := range grid.k {
		c := s.coefficientsWith(at, grid.c[step])
		for b, z := range s.next(&c, &trail, step) {
			trail[b] = [3]complex128{trail[b][1], trail[b][2], z}
			before, last := trail[b][0], trail[b][1]
			if step > 0 && (imag(last) > 0) != (imag(z) > 0) {
				f := imag(last) / (imag(last) - imag(z))
				keep(at/math.Pow(factor, 1-f), real(last)+f*(real(z)-real(last)))
			}
			// A hump that just touches the axis lies between three values.
			if step > 1 && humps(imag(before), imag(last), imag(z)) {
				keep(at/factor*1.001, real(last))
				keep(at/factor/1.02, real(last))
				keep(at/factor*1.02, real(last))
			}
		}
	}
	return found
}

// humps says that |b| is a minimum of three values of one sign, and small
// enough for its parabola to reach zero.
func humps(a, b, c float64) bool {
	if (a > 0) != (b > 0) || (b > 0) != (c > 0) {
		return false
	}
	a, b, c = math.Abs(a), math.Abs(b), math.Abs(c)
	return b <= a && b <= c && b < a+c-2*b
}

// solve refines a neutral point by Newton's method in k and y. Where the two
// branches nearly meet the determinant is flat, and rounding stops the
// iteration a little earlier.
func (s flutterSection) solve(k, y float64) (float64, float64, bool) {
	last := math.Inf(1)
	for range 30 {
		if !(k > 0 && y > 0) || k > 2*sectionFlutterKMax {
			return 0, 0, false
		}
		hk, hy := 1e-7*k, 1e-7*y
		d := s.determinant(k, y)
		dk := (s.determinant(k+hk, y) - s.determinant(k-hk, y)) / complex(2*hk, 0)
		dy := (s.determinant(k, y+hy) - s.determinant(k, y-hy)) / complex(2*hy, 0)
		j := real(dk)*imag(dy) - imag(dk)*real(dy)
		stepK := (real(d)*imag(dy) - imag(d)*real(dy)) / j
		stepY := (real(dk)*imag(d) - imag(dk)*real(d)) / j
		if math.IsNaN(stepK) || math.IsInf(stepK, 0) || math.IsNaN(stepY) || math.IsInf(stepY, 0) {
			return 0, 0, false
		}
		// No step may leave the neighbourhood of the bracket.
		limit := max(1, math.Abs(stepK)/(0.3*k), math.Abs(stepY)/(0.3*y))
		k -= stepK / limit
		y -= stepY / limit
		last = max(math.Abs(stepK)/k, math.Abs(stepY)/y)
		if last < 1e-13 {
			break
		}
	}
	return k, y, last < 1e-8
}

var sectionFlutterArgs = []Arg{
	{Name: "mu", Symbol: "μ", Doc: "m/(πρb²), b the semichord", Min: 0.05, Max: 1e4, From: 1, To: 200, Typical: 20},
	{Name: "a", Symbol: "a", Doc: "elastic axis behind mid-chord, in semichords", Min: -1, Max: 1, Typical: -0.2},
	{Name: "x_alpha", Symbol: "x_α", Doc: "centre of gravity behind the elastic axis, in semichords", Min: -1, Max: 1, Typical: 0.1},
	{Name: "r2", Symbol: "r²", Doc: "moment of inertia about the elastic axis over mb²", Min: 0.01, Max: 4, Typical: 0.24},
	{Name: "frequency_ratio", Symbol: "ω_h/ω_α", Doc: "uncoupled plunge over pitch frequency", Min: 0.01, Max: 10, Typical: 0.4},
	{Name: "damping_plunge", Symbol: "ζ_h", Doc: "damping ratio of plunge", Min: 0, Max: 0.3, Optional: true},
	{Name: "damping_pitch", Symbol: "ζ_α", Doc: "damping ratio of pitch", Min: 0, Max: 0.3, Optional: true},
}

var sectionFlutterEntry = &Entry{
	Name:     "SectionFlutter",
	Problem:  "flutter of a section with plunge and pitch, thin aerofoil in incompressible flow",
	Equation: "[μ(1 − σ²y² − 2iζ_hσy) + L_h][μr²(1 − y² − 2iζ_αy) + M_α] = [μx_α + L_α][μx_α + M_h], y = ω_α/ω, loads by C(k)",
	Args:     sectionFlutterArgs,
	Outputs: []Output{
		{ID: "speed", Symbol: "U/(bω_α)", Doc: "flutter speed; infinite where there is none", Unbounded: true},
		{ID: "frequency", Symbol: "ω/ω_α", Doc: "frequency at onset; 0 where there is none"},
		{ID: "k", Symbol: "k", Doc: "reduced frequency ωb/U at onset; 0 where there is none"},
	},
	Accuracy: 1e-9,
	Factor:   1.3,
	Sources:  []*cite.Source{cite.TheodorsenGarrick1940, cite.Theodorsen1935, cite.HodgesPierce2011},
	Note:     "thin and streamlined; static divergence is another matter (SectionDivergence) and may come first; here alone μ is mass over fluid mass",
	Eval: func(v []float64) ([]float64, error) {
		speed, frequency, k, err := SectionFlutter(v[0], v[1], v[2], v[3], v[4], v[5], v[6])
		return []float64{speed, frequency, k}, err
	},
}
