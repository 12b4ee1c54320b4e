package canon

import (
	"errors"
	"math"
	"math/cmplx"
	"testing"

	"gonum.org/v1/gonum/integrate/quad"
	"pgregory.net/rapid"
)

// stillFluidIntegral integrates f over [a, b] in equal panels.
func stillFluidIntegral(f func(float64) float64, a, b float64, panels int) float64 {
	sum := 0.0
	for i := range panels {
		lo := a + (b-a)*float64(i)/float64(panels)
		hi := a + (b-a)*float64(i+1)/float64(panels)
		sum += quad.Fixed(f, lo, hi, 16, quad.Legendre{}, 0)
	}
	return sum
}

func stillFluidNear(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if e := stillFluidError(got, want); !(e <= tolerance) {
		t.Errorf("%s = %.12g, want %.12g, off by %.1e", what, got, want, e)
	}
}

func TestStillFluidArgumentsOutOfRange(t *testing.T) {
	calls := map[string]func(x float64) error{
		"OscillatingCylinder":  func(x float64) error { _, _, err := OscillatingCylinder(x); return err },
		"OscillatingSphere":    func(x float64) error { _, _, err := OscillatingSphere(x); return err },
		"OscillatingRibbon":    func(x float64) error { _, _, err := OscillatingRibbon(x); return err },
		"CylinderInShell R":    func(x float64) error { _, _, err := CylinderInShell(x, 2); return err },
		"CylinderInShell q":    func(x float64) error { _, _, err := CylinderInShell(1, x); return err },
		"CylinderNearWall":     func(x float64) error { _, err := CylinderNearWall(x); return err },
		"CylinderBelowSurface": func(x float64) error { _, err := CylinderBelowSurface(x, RigidLid); return err },
		"SoundCylinder":        func(x float64) error { _, _, err := SoundCylinder(x); return err },
		"SoundSphere":          func(x float64) error { _, _, err := SoundSphere(x); return err },
		"BaffledPiston":        func(x float64) error { _, _, err := BaffledPiston(x); return err },
		"FlexuralWaveLoading":  func(x float64) error { _, _, err := FlexuralWaveLoading(x, 1); return err },
		"FlexuralWave length":  func(x float64) error { _, _, err := FlexuralWaveLoading(1, x); return err },
		"ThinFilm sigma":       func(x float64) error { _, _, err := ThinFilm(x, 1); return err },
		"ThinFilm aspect":      func(x float64) error { _, _, err := ThinFilm(1, x); return err },
		"ThinFilmLiquid":       func(x float64) error { _, err := ThinFilmLiquid(x); return err },
		"VeijolaViscosity":     func(x float64) error { _, err := VeijolaViscosity(x); return err },
		"PulsatileTube":        func(x float64) error { _, _, err := PulsatileTube(x); return err },
	}
	for name, call := range calls {
		for _, x := range []float64{-1, 1e300, math.NaN(), math.Inf(1)} {
			var want *RangeError
			if err := call(x); !errors.As(err, &want) {
				t.Errorf("%s at %g: error %v, want a RangeError", name, x, err)
			}
		}
	}
	var want *RangeError
	if _, err := CylinderBelowSurface(1, SurfaceKind(7)); !errors.As(err, &want) {
		t.Errorf("unknown surface: error %v, want a RangeError", err)
	}
	if len(calls) != 17 {
		t.Errorf("ran %d rows, want 17", len(calls))
	}
}

// Every entry returns finite values, as many as it declares, at any point of its
// stated range.
func TestStillFluidEntriesHoldOnTheirRange(t *testing.T) {
	for _, e := range stillFluidEntries {
		if e.Problem == "" || e.Equation == "" || len(e.Sources) == 0 || e.Accuracy <= 0 || e.Factor < 1 {
			t.Errorf("%s is incomplete", e.Name)
		}
		rapid.Check(t, func(rt *rapid.T) {
			args := make([]float64, len(e.Args))
			for i, a := range e.Args {
				args[i] = stillFluidDraw(rt, a)
			}
			got, err := e.Evaluate(args)
			if err != nil {
				rt.Fatalf("%s%v: %v", e.Name, args, err)
			}
			if len(got) != len(e.Outputs) {
				rt.Fatalf("%s returns %d values, declares %d", e.Name, len(got), len(e.Outputs))
			}
			for i, v := range got {
				if math.IsNaN(v) || math.IsInf(v, 0) || v < 0 {
					rt.Fatalf("%s%v: %s = %g", e.Name, args, e.Outputs[i].ID, v)
				}
			}
		})
	}
	if len(stillFluidEntries) != 14 {
		t.Errorf("ran %d entries, want 14", len(stillFluidEntries))
	}
}

// stillFluidDraw draws an argument, uniform in its logarithm.
func stillFluidDraw(t *rapid.T, a Arg) float64 {
	if n := len(a.Choices); n > 0 {
		return float64(rapid.IntRange(0, n-1).Draw(t, a.Name))
	}
	low := math.Max(a.Min, a.Max*1e-30)
	f := rapid.Float64Range(0, 1).Draw(t, a.Name)
	return math.Min(a.Max, math.Max(a.Min, low*math.Pow(a.Max/low, f)))
}

// Wronskian of the modified functions, I₀K₁ + I₁K₀ = 1/z, where I and K are
// evaluated by unlike methods, over the sector and across both hand-overs.
func TestBesselWronskian(t *testing.T) {
	ran := 0
	for i := range 400 {
		size := 1e-3 * math.Pow(1e6, float64(i)/399)
		for j := range 11 {
			z := cmplx.Rect(size, math.Pi/4*float64(j-5)/5)
			k0, kr := besselKScaled(z)
			i0, ir, _ := besselIScaled(z)
			if e := cmplx.Abs(z*i0*k0*(kr+ir) - 1); e > 1e-12 {
				t.Errorf("z = %v: Wronskian off by %.1e", z, e)
			}
			ran++
		}
	}
	if ran != 4400 {
		t.Errorf("ran %d points, want 4400", ran)
	}
}

// Recurrence I₀ − I₂ = 2I₁/z where the three come from their own series, and
// conjugate symmetry of all.
func TestBesselRecurrence(t *testing.T) {
	ran := 0
	for size := 0.1; size < 17; size += 0.1 {
		z := cmplx.Rect(size, math.Pi/4)
		i0, i1, i2 := besselISeries(z)
		if e := cmplx.Abs(i0-i2-2*i1/z) / cmplx.Abs(i0); e > 1e-12 {
			t.Errorf("z = %v: recurrence off by %.1e", z, e)
		}
		ran++
	}
	for _, size := range []float64{0.5, 5, 18.5, 30} {
		z := cmplx.Rect(size, 0.6)
		for _, f := range []func(complex128) complex128{
			besselKRatio,
			func(z complex128) complex128 { r, _ := besselIRatios(z); return r },
		} {
			if e := cmplx.Abs(f(cmplx.Conj(z)) - cmplx.Conj(f(z))); e > 1e-15 {
				t.Errorf("z = %v: conjugate off by %.1e", z, e)
			}
			ran++
		}
	}
	if ran < 170 {
		t.Errorf("ran %d points, want at least 170", ran)
	}
}

// No hand-over between two evaluations may show: the values next to it on
// either side differ by rounding.
func TestStillFluidHandOvers(t *testing.T) {
	const tolerance = 1e-11
	below := func(x float64) float64 { return x * (1 - 1e-15) }
	above := func(x float64) float64 { return x * (1 + 1e-15) }
	type handOver struct {
		name string
		at   float64
		f    func(x float64) []float64
	}
	pair := func(f func(float64) (float64, float64, error)) func(float64) []float64 {
		return func(x float64) []float64 { a, b, _ := f(x); return []float64{a, b} }
	}
	single := func(f func(float64) (float64, error)) func(float64) []float64 {
		return func(x float64) []float64 { a, _ := f(x); return []float64{a} }
	}
	rows := []handOver{
		{"cylinder near", besselNear * besselNear, pair(OscillatingCylinder)},
		{"cylinder far", besselFar * besselFar, pair(OscillatingCylinder)},
		{"tube", besselFar, pair(PulsatileTube)},
		{"sound small", 1e-9, pair(SoundCylinder)},
		{"sound far", besselFar, pair(SoundCylinder)},
		{"piston near", struveNear / 2, pair(BaffledPiston)},
		{"piston far", struveFar / 2, pair(BaffledPiston)},
		{"wall", (math.Cosh(math.Pi) - 1) / 2, single(CylinderNearWall)},
		{"surface", (math.Cosh(math.Pi) - 1) / 2, single(func(x float64) (float64, error) { return CylinderBelowSurface(x, PressureFree) })},
		{"surface twice", (math.Cosh(math.Pi/2) - 1) / 2, single(func(x float64) (float64, error) { return CylinderBelowSurface(x, PressureFree) })},
		{"liquid film", 1, single(ThinFilmLiquid)},
	}
	for _, aspect := range []float64{0, 0.03, 0.3, 1} {
		film := pair(func(x float64) (float64, float64, error) { return ThinFilm(x, aspect) })
		rows = append(rows, handOver{"film strip", 400, film}, handOver{"film far", filmFarSigma, film})
	}
	for _, sigma := range []float64{1e-6, 1, 100, 3000} {
		film := pair(func(x float64) (float64, float64, error) { return ThinFilm(sigma, x) })
		rows = append(rows, handOver{"film square", 1, film})
	}
	for _, r := range []float64{1e-8, 1e-3, 1, 7, 30, 36, 50, 1e4, 1e8} {
		inQ := pair(func(q float64) (float64, float64, error) { return CylinderInShell(r, q) })
		rows = append(rows, handOver{"shell in q", shellNarrow, inQ})
		if q := shellWide / math.Sqrt(r); q > shellNarrow {
			rows = append(rows, handOver{"shell wide in q", math.Min(q, 1e5), inQ})
		}
	}
	for _, q := range []float64{1.000001, 1.0001, 1.01, 1.2, 1.45, 2, 10, 1e4} {
		inR := pair(func(r float64) (float64, float64, error) { return CylinderInShell(r, q) })
		for _, root := range []float64{shellGapThin / (q - 1), shellWide / q, besselFar, besselFar / q, 42 * math.Sqrt2 / (q - 1)} {
			rows = append(rows, handOver{"shell in R", root * root, inR})
		}
	}
	worst := 0.0
	for _, row := range rows {
		a, b := row.f(below(row.at)), row.f(above(row.at))
		for i := range a {
			e := stillFluidError(a[i], b[i])
			worst = math.Max(worst, e)
			if e > tolerance {
				t.Errorf("%s at %g: %.15g and %.15g, %.1e apart", row.name, row.at, a[i], b[i], e)
			}
		}
	}
	t.Logf("worst step %.1e", worst)
	if len(rows) < 75 {
		t.Errorf("ran %d rows, want at least 75", len(rows))
	}
}

// stillFluidFlow is the radial part f of the stream function about a cylinder of
// radius 1 with velocity 1, with its first two derivatives.
type stillFluidFlow func(r float64) (f, f1, f2 complex128)

// energies returns Γr and Γi from the flow itself: twice the mean kinetic energy
// and the mean dissipation over those of the ideal added mass, with the
// circular frequency and the density 1 and the viscosity 1/R.
func (flow stillFluidFlow) energies(stokes float64, integral func(func(float64) float64) float64) (gammaR, gammaI float64) {
	square := func(z complex128) float64 { return real(z)*real(z) + imag(z)*imag(z) }
	gammaR = integral(func(r float64) float64 {
		f, f1, _ := flow(r)
		return r * (square(f)/(r*r) + square(f1))
	})
	gammaI = integral(func(r float64) float64 {
		f, f1, f2 := flow(r)
		c := complex(r, 0)
		stretch := f1/c - f/(c*c)
		shear := f2 - f1/c + f/(c*c)
		return r * (2*square(stretch) + square(shear)/2)
	}) * 2 / stokes
	return gammaR, gammaI
}

// The added mass is that of the kinetic energy of the flow, and the damping
// takes what the fluid dissipates.
func TestOscillatingCylinderEnergy(t *testing.T) {
	rows := []float64{0.5, 3, 20, 300, 5000}
	for _, stokes := range rows {
		gr, gi, err := OscillatingCylinder(stokes)
		if err != nil {
			t.Fatal(err)
		}
		z := viscousRoot(stokes)
		a2 := (complex(gr, -gi) + 1) / 2
		k0a, ka := besselKScaled(z)
		flow := stillFluidFlow(func(r float64) (f, f1, f2 complex128) {
			c := complex(r, 0)
			k0, ratio := besselKScaled(z * c)
			scale := (1 - a2) * cmplx.Exp(z*(1-c)) / (k0a * ka)
			g := scale * k0 * ratio
			g1 := -scale * (z*k0 + k0*ratio/c)
			f = a2/c + g
			f1 = -a2/(c*c) + g1
			f2 = 2*a2/(c*c*c) + z*z*g - g1/c + g/(c*c)
			return f, f1, f2
		})
		// The outer flow decays with a power of r: t = 1/r maps it on (0, 1].
		r, i := flow.energies(stokes, func(f func(float64) float64) float64 {
			return stillFluidIntegral(func(t float64) float64 { return f(1/t) / (t * t) }, 1e-9, 1, 60)
		})
		stillFluidNear(t, "kinetic energy", r, gr, 1e-7)
		stillFluidNear(t, "dissipation", i, gi, 1e-7)
	}
	if len(rows) != 5 {
		t.Errorf("ran %d rows, want 5", len(rows))
	}
	tally(t, "OscillatingCylinder", "kinetic energy and dissipation of the flow", 2*len(rows))
}

// stillFluidSolve solves a small complex system by elimination with pivots.
func stillFluidSolve(a [4][5]complex128) [4]complex128 {
	for c := range 4 {
		p := c
		for r := c + 1; r < 4; r++ {
			if cmplx.Abs(a[r][c]) > cmplx.Abs(a[p][c]) {
				p = r
			}
		}
		a[c], a[p] = a[p], a[c]
		for r := range 4 {
			if r == c {
				continue
			}
			m := a[r][c] / a[c][c]
			for k := c; k < 5; k++ {
				a[r][k] -= m * a[c][k]
			}
		}
	}
	var x [4]complex128
	for i := range x {
		x[i] = a[i][4] / a[i][i]
	}
	return x
}

// The four coefficients solved as they stand, and the energies of the flow that
// they describe.
func TestCylinderInShellCoefficientsAndEnergy(t *testing.T) {
	rows := []struct{ stokes, q float64 }{
		{1, 1.3}, {1, 2}, {1, 4}, {20, 1.2}, {20, 1.6}, {20, 3}, {300, 1.1}, {300, 1.45}, {300, 2}, {2000, 1.05}, {2000, 1.3},
	}
	for _, row := range rows {
		gr, gi, err := CylinderInShell(row.stokes, row.q)
		if err != nil {
			t.Fatal(err)
		}
		z := viscousRoot(row.stokes)
		part := func(r float64) (i, i1, k, k1 complex128) {
			c := complex(r, 0)
			i0, ratio, _ := besselIScaled(z * c)
			k0, kratio := besselKScaled(z * c)
			up, down := cmplx.Exp(z*(c-1)), cmplx.Exp(z*(1-c))
			i, k = i0*ratio*up, k0*kratio*down
			return i, z*i0*up - i/c, k, -z*k0*down - k/c
		}
		row4 := func(r float64, want complex128) (value, slope [5]complex128) {
			c := complex(r, 0)
			i, i1, k, k1 := part(r)
			return [5]complex128{c, 1 / c, i, k, want}, [5]complex128{1, -1 / (c * c), i1, k1, want}
		}
		v1, s1 := row4(1, 1)
		v2, s2 := row4(row.q, 0)
		a := stillFluidSolve([4][5]complex128{v1, s1, v2, s2})
		g := 2*a[1] - 1
		stillFluidNear(t, "Γr from the coefficients", gr, real(g), 1e-9)
		stillFluidNear(t, "Γi from the coefficients", gi, -imag(g), 1e-9)
		flow := stillFluidFlow(func(r float64) (f, f1, f2 complex128) {
			c := complex(r, 0)
			i, i1, k, k1 := part(r)
			h, h1 := a[2]*i+a[3]*k, a[2]*i1+a[3]*k1
			return a[0]*c + a[1]/c + h, a[0] - a[1]/(c*c) + h1,
				2*a[1]/(c*c*c) + z*z*h - h1/c + h/(c*c)
		})
		r, i := flow.energies(row.stokes, func(f func(float64) float64) float64 {
			return stillFluidIntegral(f, 1, row.q, 30)
		})
		stillFluidNear(t, "kinetic energy", r, gr, 1e-8)
		stillFluidNear(t, "dissipation", i, gi, 1e-8)
	}
	if len(rows) != 11 {
		t.Errorf("ran %d rows, want 11", len(rows))
	}
	tally(t, "CylinderInShell", "the four coefficients, solved as they stand", 2*len(rows))
	tally(t, "CylinderInShell", "kinetic energy and dissipation of the flow", 2*len(rows))
}

// Kelvin: of all flows with these normal velocities the potential flow has the
// least kinetic energy. Helmholtz: of all with these velocities creeping flow
// dissipates least. Both bound the viscous flow at every R.
func TestCylinderInShellMinimumPrinciples(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		stokes := math.Pow(10, rapid.Float64Range(-8, 16).Draw(rt, "log R"))
		q := 1 + math.Pow(10, rapid.Float64Range(-2, 3).Draw(rt, "log gap"))
		gr, gi, err := CylinderInShell(stokes, q)
		if err != nil {
			rt.Fatal(err)
		}
		q2 := q * q
		if least := (q2 + 1) / (q2 - 1); gr < least*(1-1e-12) {
			rt.Errorf("R %g, q %g: Γr = %.12g below the ideal %.12g", stokes, q, gr, least)
		}
		if least := 4 / (stokes * (math.Log(q) - (q2-1)/(q2+1))); gi < least*(1-1e-8) {
			rt.Errorf("R %g, q %g: Γi = %.12g below creeping flow %.12g", stokes, q, gi, least)
		}
		free, _, err := OscillatingCylinder(stokes)
		if err != nil || free < 1 {
			rt.Errorf("R %g: free Γr = %g, %v", stokes, free, err)
		}
	})
	tally(t, "CylinderInShell", "minimum principles of Kelvin and Helmholtz", 2)
}

func TestCylinderInShellLimits(t *testing.T) {
	ran := 0
	for _, q := range []float64{1.001, 1.05, 1.4, 1.6, 2, 10, 100} {
		gr, gi, err := CylinderInShell(1e16, q)
		if err != nil {
			t.Fatal(err)
		}
		stillFluidNear(t, "ideal fluid", gr, (q*q+1)/(q*q-1), 1e-4)
		if gi > 1e-4*gr {
			t.Errorf("q %g: Γi = %g does not vanish against %g", q, gi, gr)
		}
		ran++
	}
	for _, stokes := range []float64{0.01, 1, 100, 1e6} {
		gr, gi, err := CylinderInShell(stokes, 1e6)
		if err != nil {
			t.Fatal(err)
		}
		fr, fi, err := OscillatingCylinder(stokes)
		if err != nil {
			t.Fatal(err)
		}
		stillFluidNear(t, "free Γr", gr, fr, 1e-8)
		stillFluidNear(t, "free Γi", gi, fi, 1e-8)
		ran++
	}
	for _, h := range []float64{1e-6, 1e-5, 1e-4, 1e-3} {
		for _, stokes := range []float64{1e-8, 1e-3, 1, 100} {
			gr, gi, err := CylinderInShell(stokes, 1+h)
			if err != nil {
				t.Fatal(err)
			}
			gap := (1 + h) - 1
			stillFluidNear(t, "film Γr", gr, 6/(5*gap), 3*h)
			stillFluidNear(t, "film Γi", gi, 12/(stokes*gap*gap*gap), 3*h)
			ran++
		}
	}
	if ran != 27 {
		t.Errorf("ran %d rows, want 27", ran)
	}
	tally(t, "CylinderInShell", "wide shell: the free cylinder", 8)
	tally(t, "CylinderInShell", "narrow gap: viscous film", 32)
}

func TestOscillationLimits(t *testing.T) {
	ran := 0
	for _, stokes := range []float64{1e8, 1e12, 1e18} {
		layer := math.Sqrt(2 / stokes)
		gr, gi, err := OscillatingCylinder(stokes)
		if err != nil {
			t.Fatal(err)
		}
		stillFluidNear(t, "Γr", gr, 1+2*layer, 2*layer*layer*layer)
		stillFluidNear(t, "Γi", gi, 2*layer*(1+layer/2), 2*layer*layer+1e-14)
		ran++
	}
	for _, stokes := range []float64{1e-12, 1e-8} {
		_, gi, err := OscillatingCylinder(stokes)
		if err != nil {
			t.Fatal(err)
		}
		// Creeping flow: 4/(R|L|) with L = ln(√R/2) + γ + iπ/4, its real part.
		l := math.Log(math.Sqrt(stokes)/2) + eulerGamma
		want := 4 / stokes * -l / (l*l + math.Pi*math.Pi/16)
		stillFluidNear(t, "creeping Γi", gi, want, 10*stokes*l*l)
		ran++
	}
	_, damping, err := OscillatingSphere(1e-12)
	if err != nil {
		t.Fatal(err)
	}
	// 6πρνa over ωρ(4/3)πa³ is 9/(2R).
	stillFluidNear(t, "creeping sphere", damping, 4.5/1e-12, 1e-6)
	added, damping, err := OscillatingSphere(1e18)
	if err != nil {
		t.Fatal(err)
	}
	stillFluidNear(t, "ideal sphere", added, 0.5, 1e-8)
	stillFluidNear(t, "sphere layer", damping, 2.25*math.Sqrt(2/1e18), 1e-8)
	for _, stokes := range []float64{ribbonMaxR, 3e3} {
		gr, gi, err := OscillatingRibbon(stokes)
		if err != nil {
			t.Fatal(err)
		}
		if math.Abs(gr-1) > 0.1 || gi > 0.1 {
			t.Errorf("ribbon at %g: %g, %g, want near 1, 0", stokes, gr, gi)
		}
		ran++
	}
	// Ribbon and cylinder of the same width share the logarithmic creeping limit.
	gr, gi, err := OscillatingRibbon(ribbonMinR)
	if err != nil {
		t.Fatal(err)
	}
	fr, fi, err := OscillatingCylinder(ribbonMinR)
	if err != nil {
		t.Fatal(err)
	}
	stillFluidNear(t, "ribbon creeping Γr", gr, fr, 0.2)
	stillFluidNear(t, "ribbon creeping Γi", gi, fi, 0.1)
	if ran != 7 {
		t.Errorf("ran %d rows, want 7", ran)
	}
	tally(t, "OscillatingRibbon", "the circular cylinder in creeping flow", 2)
}

// The images summed as the recurrence gives them.
func TestImagesRecurrence(t *testing.T) {
	ran := 0
	for _, e := range []float64{0.001, 0.01, 0.1, 0.4, 1, 2, 2.7, 5, 50, 1e4} {
		for kind, sign := range map[SurfaceKind]float64{RigidLid: 1, PressureFree: -1} {
			h := 1 + 2*e
			d, s, power, want := 2*h, 1.0, 1.0, 1.0
			for s > 1e-18 {
				s /= d * d
				d = 2*h - 1/d
				power *= sign
				want += 2 * power * s
			}
			got, err := CylinderBelowSurface(e, kind)
			if err != nil {
				t.Fatal(err)
			}
			stillFluidNear(t, kind.String(), got, want, 1e-12)
			ran++
		}
		wall, err := CylinderNearWall(e)
		if err != nil {
			t.Fatal(err)
		}
		lid, err := CylinderBelowSurface(e, RigidLid)
		if err != nil {
			t.Fatal(err)
		}
		if wall != lid {
			t.Errorf("e %g: wall %g and lid %g differ", e, wall, lid)
		}
	}
	touching, err := CylinderNearWall(0)
	if err != nil {
		t.Fatal(err)
	}
	stillFluidNear(t, "touching wall", touching, math.Pi*math.Pi/3-1, 1e-15)
	free, err := CylinderBelowSurface(0, PressureFree)
	if err != nil {
		t.Fatal(err)
	}
	stillFluidNear(t, "touching surface", free, math.Pi*math.Pi/6-1, 1e-15)
	for _, e := range []float64{1e-300, 1e-30, 1e-20} {
		c, err := CylinderNearWall(e)
		if err != nil {
			t.Fatal(err)
		}
		stillFluidNear(t, "almost touching", c, math.Pi*math.Pi/3-1-4*math.Sqrt(e), 1e-14)
		ran++
	}
	if ran != 23 {
		t.Errorf("ran %d rows, want 23", ran)
	}
	tally(t, "CylinderNearWall", "images by their recurrence", 10)
	tally(t, "CylinderNearWall", "almost touching: π²/3 − 1 − 4√e", 3)
	tally(t, "CylinderBelowSurface", "images by their recurrence", 20)
}

// The power at infinity is that at the surface: Γi π x² |H₁′|²/2 = 1, with the
// Bessel functions of package math also where the expansion serves.
func TestSoundCylinderRadiatedPower(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		x := math.Pow(10, rapid.Float64Range(-8, 5).Draw(rt, "log x"))
		_, gi, err := SoundCylinder(x)
		if err != nil {
			rt.Fatal(err)
		}
		dj, dy := math.J0(x)-math.J1(x)/x, math.Y0(x)-math.Y1(x)/x
		if p := gi * math.Pi * x * x * (dj*dj + dy*dy) / 2; math.Abs(p-1) > 1e-11 {
			rt.Errorf("x = %g: radiated power over surface power %.15g", x, p)
		}
	})
	tally(t, "SoundCylinder", "radiated power", 1)
}

// The sphere from its Hankel function h₁⁽²⁾(x) = e^{−ix}(i/x² − 1/x).
func TestSoundSphereFromHankel(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		x := math.Pow(10, rapid.Float64Range(-2, 3).Draw(rt, "log x"))
		gr, gi, err := SoundSphere(x)
		if err != nil {
			rt.Fatal(err)
		}
		i, c := complex(0, 1), complex(x, 0)
		h := i/(c*c) - 1/c
		slope := -i*h - 2*i/(c*c*c) + 1/(c*c)
		want := -2 * h / (c * slope)
		if e := cmplx.Abs(complex(gr, -gi) - want); e > 1e-10*cmplx.Abs(want) {
			rt.Errorf("x = %g: %g, %g, want %v", x, gr, gi, want)
		}
	})
	tally(t, "SoundSphere", "spherical Hankel function", 1)
}

// The resistance is the power in the far field, ∫ directivity² sin θ dθ.
func TestBaffledPistonRadiatedPower(t *testing.T) {
	rows := []float64{0.01, 0.5, 1.5, 3, 8, 15, 25, 60}
	for _, x := range rows {
		r1, _, err := BaffledPiston(x)
		if err != nil {
			t.Fatal(err)
		}
		power := stillFluidIntegral(func(theta float64) float64 {
			u := x * math.Sin(theta)
			d := 2 * math.J1(u) / u
			return d * d * math.Sin(theta)
		}, 0, math.Pi/2, 40)
		stillFluidNear(t, "far field", r1, x*x/2*power, 1e-10)
	}
	if len(rows) != 8 {
		t.Errorf("ran %d rows, want 8", len(rows))
	}
	tally(t, "BaffledPiston", "radiated power", len(rows))
}

// Struve's function from its integral (2x/π)∫₀^{π/2} sin(x cos θ) sin²θ dθ.
func TestStruveIntegral(t *testing.T) {
	ran := 0
	for x := 0.1; x < 80; x *= 1.3 {
		integral := stillFluidIntegral(func(theta float64) float64 {
			s := math.Sin(theta)
			return math.Sin(x*math.Cos(theta)) * s * s
		}, 0, math.Pi/2, 20)
		stillFluidNear(t, "H₁", struveH1(x), 2*x/math.Pi*integral, 1e-12)
		ran++
	}
	if ran != 26 {
		t.Errorf("ran %d rows, want 26", ran)
	}
	tally(t, "BaffledPiston", "Struve's integral", ran)
}

func TestSoundLimits(t *testing.T) {
	ran := 0
	for _, x := range []float64{1e-8, 1e-6, 1e-4} {
		gr, gi, _ := SoundCylinder(x)
		stillFluidNear(t, "cylinder Γr", gr, 1, 20*x*x)
		stillFluidNear(t, "cylinder Γi", gi, math.Pi/2*x*x, 40*x*x)
		sr, si, _ := SoundSphere(x)
		stillFluidNear(t, "sphere Γr", sr, 1, x*x)
		stillFluidNear(t, "sphere Γi", si, x*x*x/2, x*x)
		r1, x1, _ := BaffledPiston(x)
		stillFluidNear(t, "piston R₁", r1, x*x/2, x*x)
		stillFluidNear(t, "piston X₁", x1, 8*x/(3*math.Pi), x*x+1e-15)
		ran++
	}
	for _, x := range []float64{1e4, 1e6, 1e10} {
		gr, gi, _ := SoundCylinder(x)
		stillFluidNear(t, "cylinder Γr", gr, 1/(2*x*x), 10/x)
		stillFluidNear(t, "cylinder Γi", gi, 1/x, 10/x)
		sr, si, _ := SoundSphere(x)
		stillFluidNear(t, "sphere Γr", sr, 2/(x*x), 10/x)
		stillFluidNear(t, "sphere Γi", si, 2/x, 10/x)
		r1, x1, _ := BaffledPiston(x)
		stillFluidNear(t, "piston R₁", r1, 1, 2/x)
		stillFluidNear(t, "piston X₁", x1, 2/(math.Pi*x), 1/math.Sqrt(x))
		ran++
	}
	if ran != 6 {
		t.Errorf("ran %d rows, want 6", ran)
	}
}

func TestFlexuralWaveLoading(t *testing.T) {
	rows := []struct{ s, kbL, mass, resistance float64 }{
		{0, 1e6, 1, 0},
		{0.6, 1e6, 1.25, 0},
		{1e8, 1e6, 0, 1},
		{1.25, 1e6, 0, 5. / 3},
		// The floor π/(k_b L) = 0.01 of a plate of finite length, on both sides.
		{0.999, 100 * math.Pi, 10, 0},
		{1, 100 * math.Pi, 0, 10},
		// A plate shorter than a half wave has no floor above 1.
		{0.6, 1, 1, 0},
	}
	for _, row := range rows {
		m, r, err := FlexuralWaveLoading(row.s, row.kbL)
		if err != nil {
			t.Fatal(err)
		}
		stillFluidNear(t, "mass", m, row.mass, 1e-12)
		stillFluidNear(t, "resistance", r, row.resistance, 1e-12)
	}
	if len(rows) != 7 {
		t.Errorf("ran %d rows, want 7", len(rows))
	}
	rapid.Check(t, func(rt *rapid.T) {
		s := rapid.Float64Range(0, 5).Draw(rt, "s")
		m, r, err := FlexuralWaveLoading(s, 1e6)
		if err != nil {
			rt.Fatal(err)
		}
		// |impedance| in units of ρc: ωm/(ρc) = s·mass below coincidence.
		z := math.Max(s*m, r)
		if want := s / math.Sqrt(math.Max(math.Abs(1-s*s), math.Pi/1e6)); math.Abs(z-want) > 1e-9*want {
			rt.Errorf("s %g: impedance %g, want %g", s, z, want)
		}
	})
	tally(t, "FlexuralWaveLoading", "Pythagorean wave numbers, by hand", 2*len(rows))
	tally(t, "FlexuralWaveLoading", "impedance of the fluid", 1)
}

func TestThinFilmLimits(t *testing.T) {
	ran := 0
	for _, aspect := range []float64{0, 0.2, 0.5, 1, 2, 10} {
		liquid, err := ThinFilmLiquid(aspect)
		if err != nil {
			t.Fatal(err)
		}
		for _, sigma := range []float64{1e-8, 1e-5} {
			spring, damping, err := ThinFilm(sigma, aspect)
			if err != nil {
				t.Fatal(err)
			}
			stillFluidNear(t, "liquid limit", damping, sigma/12*liquid, 1e-9)
			if spring > sigma*damping {
				t.Errorf("σ %g, aspect %g: spring %g does not vanish against damping %g", sigma, aspect, spring, damping)
			}
			ran++
		}
		spring, damping, err := ThinFilm(1e12, aspect)
		if err != nil {
			t.Fatal(err)
		}
		stillFluidNear(t, "closed gas", spring, 1, 1e-4)
		if damping > 1e-4 {
			t.Errorf("aspect %g: damping %g does not vanish", aspect, damping)
		}
		ran++
	}
	if ran != 18 {
		t.Errorf("ran %d rows, want 18", ran)
	}
}

// The double series summed term by term, on both sides of the square, where the
// function exchanges the sides of the plate.
func TestThinFilmDoubleSeries(t *testing.T) {
	ran := 0
	for _, aspect := range []float64{0.3, 1, 1.7, 3} {
		for _, sigma := range []float64{0.1, 8.5, 60} {
			var sum complex128
			for m := 1.0; m < 400; m += 2 {
				for n := 1.0; n < 400; n += 2 {
					b := math.Pi * math.Pi * (m*m + aspect*aspect*n*n)
					sum += complex(0, sigma) / (complex(m*m*n*n, 0) * complex(b, sigma))
				}
			}
			sum *= 64 / (math.Pi * math.Pi * math.Pi * math.Pi)
			spring, damping, err := ThinFilm(sigma, aspect)
			if err != nil {
				t.Fatal(err)
			}
			stillFluidNear(t, "spring", spring, real(sum), 1e-6)
			stillFluidNear(t, "damping", damping, imag(sum), 1e-6)
			ran++
		}
	}
	if ran != 12 {
		t.Errorf("ran %d rows, want 12", ran)
	}
	tally(t, "ThinFilm", "double series, term by term, from both sides", 2*ran)
}

// Published behaviour, from memory of Blech 1983: the damping of a square plate is
// 0.42 of that of a strip of its width, and spring equals damping at a squeeze
// number near 10 for a long strip and near 20 for a square, π²(1 + β²) in the
// first mode.
func TestThinFilmPublished(t *testing.T) {
	square, err := ThinFilmLiquid(1)
	if err != nil {
		t.Fatal(err)
	}
	stillFluidNear(t, "square plate", square, 0.42, 0.005)
	rows := []struct{ aspect, cutOff float64 }{{0, 10}, {1, 20}}
	for _, row := range rows {
		for factor, springWins := range map[float64]bool{0.9: false, 1.15: true} {
			spring, damping, err := ThinFilm(row.cutOff*factor, row.aspect)
			if err != nil {
				t.Fatal(err)
			}
			if (spring > damping) != springWins {
				t.Errorf("aspect %g, σ %g: spring %g, damping %g", row.aspect, row.cutOff*factor, spring, damping)
			}
		}
	}
	if len(rows) != 2 {
		t.Errorf("ran %d rows, want 2", len(rows))
	}
	tally(t, "ThinFilm", "cut-off of strip and square", 2*len(rows))
	tally(t, "ThinFilmLiquid", "square plate 0.42", 1)
}

func TestVeijolaViscosity(t *testing.T) {
	for _, row := range []struct{ kn, want float64 }{{0, 1}, {0.034, 0.8393}, {1, 1 / 10.638}} {
		got, err := VeijolaViscosity(row.kn)
		if err != nil {
			t.Fatal(err)
		}
		stillFluidNear(t, "viscosity", got, row.want, 1e-4)
	}
	// In the slip regime the first-order slip of Poiseuille flow, 1/(1 + 6Kn).
	got, err := VeijolaViscosity(0.03)
	if err != nil {
		t.Fatal(err)
	}
	stillFluidNear(t, "slip flow", got, 1/(1+6*0.03), 0.03)
	tally(t, "VeijolaViscosity", "slip flow", 1)
}

// The imaginary part is what the wall shear dissipates, the real part what moves.
func TestPulsatileTubeEnergy(t *testing.T) {
	rows := []float64{0.5, 2, 5, 13.3, 17}
	for _, alpha := range rows {
		re, im, err := PulsatileTube(alpha)
		if err != nil {
			t.Fatal(err)
		}
		w := viscousRoot(alpha * alpha)
		centre, _, _ := besselISeries(w)
		moving := stillFluidIntegral(func(r float64) float64 {
			i0, _, _ := besselISeries(w * complex(r, 0))
			u := cmplx.Abs(1 - i0/centre)
			return 2 * r * u * u
		}, 0, 1, 20)
		shear := stillFluidIntegral(func(r float64) float64 {
			_, i1, _ := besselISeries(w * complex(r, 0))
			u := cmplx.Abs(w * i1 / centre)
			return 2 * r * u * u / (alpha * alpha)
		}, 0, 1, 20)
		stillFluidNear(t, "moving", re, moving, 1e-9)
		stillFluidNear(t, "shear", im, shear, 1e-9)
	}
	if len(rows) != 5 {
		t.Errorf("ran %d rows, want 5", len(rows))
	}
	for _, alpha := range []float64{1e-8, 1e-4} {
		re, im, err := PulsatileTube(alpha)
		if err != nil {
			t.Fatal(err)
		}
		a2 := alpha * alpha
		stillFluidNear(t, "slow re", re, a2*a2/48, 1e-7)
		stillFluidNear(t, "slow im", im, a2/8, 1e-7)
	}
	tally(t, "PulsatileTube", "kinetic energy and dissipation of the flow", 2*len(rows))
}

// The check values that the documentation of the functions gives.
func TestStillFluidDocumentedValues(t *testing.T) {
	rows := []struct {
		name string
		args []float64
		want []float64
	}{
		{"OscillatingCylinder", []float64{1}, []float64{3.96801484714, 4.56657056633}},
		{"OscillatingSphere", []float64{1}, []float64{3.68198051534, 7.68198051534}},
		{"OscillatingRibbon", []float64{10}, []float64{1.91831810625, 0.981621970169}},
		{"CylinderInShell", []float64{1000, 1.5}, []float64{2.969028545, 0.443900287693}},
		{"CylinderNearWall", []float64{0.25}, []float64{1.25878145271}},
		{"SoundCylinder", []float64{1}, []float64{0.622212837086, 0.738796559136}},
		{"SoundSphere", []float64{1}, []float64{1.2, 0.4}},
		{"BaffledPiston", []float64{1}, []float64{0.423275192243, 0.646763728284}},
		{"PulsatileTube", []float64{3}, []float64{0.500989702414, 0.359962839122}},
		{"ThinFilmLiquid", []float64{1}, []float64{0.421731044865}},
	}
	for _, row := range rows {
		got, err := Find(row.name).Evaluate(row.args)
		if err != nil {
			t.Fatal(err)
		}
		for i, want := range row.want {
			stillFluidNear(t, row.name, got[i], want, 1e-11)
		}
	}
	stillFluidNear(t, "H₁(2)", struveH1(2), 0.64676372828356, 1e-13)
	if len(rows) != 10 {
		t.Errorf("ran %d rows, want 10", len(rows))
	}
}

var stillFluidSink float64

func stillFluidBenchmark(b *testing.B, args [][2]float64, f func(x, y float64) (float64, float64, error)) {
	for i := 0; b.Loop(); i++ {
		a := args[i%len(args)]
		r, _, err := f(a[0], a[1])
		if err != nil {
			b.Fatal(err)
		}
		stillFluidSink = r
	}
}

func BenchmarkOscillatingCylinder(b *testing.B) {
	args := [][2]float64{{0.1}, {6}, {6.5}, {20}, {100}, {330}, {1e6}}
	stillFluidBenchmark(b, args, func(x, _ float64) (float64, float64, error) { return OscillatingCylinder(x) })
}

func BenchmarkOscillatingRibbon(b *testing.B) {
	args := [][2]float64{{0.1}, {6}, {20}, {100}, {330}}
	stillFluidBenchmark(b, args, func(x, _ float64) (float64, float64, error) { return OscillatingRibbon(x) })
}

func BenchmarkCylinderInShellGap(b *testing.B) {
	stillFluidBenchmark(b, [][2]float64{{10, 1.02}, {1, 1.4}}, CylinderInShell)
}

func BenchmarkCylinderInShellPower(b *testing.B) {
	stillFluidBenchmark(b, [][2]float64{{1, 2}, {0.01, 30}}, CylinderInShell)
}

func BenchmarkCylinderInShellGeneral(b *testing.B) {
	stillFluidBenchmark(b, [][2]float64{{100, 2}, {1000, 1.5}}, CylinderInShell)
}

func BenchmarkCylinderNearWall(b *testing.B) {
	args := [][2]float64{{0.01}, {0.5}, {4}}
	stillFluidBenchmark(b, args, func(x, _ float64) (float64, float64, error) { c, err := CylinderNearWall(x); return c, 0, err })
}

func BenchmarkSoundCylinder(b *testing.B) {
	args := [][2]float64{{0.1}, {3}, {19}, {100}}
	stillFluidBenchmark(b, args, func(x, _ float64) (float64, float64, error) { return SoundCylinder(x) })
}

func BenchmarkBaffledPiston(b *testing.B) {
	args := [][2]float64{{0.1}, {3}, {19}, {100}}
	stillFluidBenchmark(b, args, func(x, _ float64) (float64, float64, error) { return BaffledPiston(x) })
}

func BenchmarkPulsatileTube(b *testing.B) {
	args := [][2]float64{{0.1}, {3}, {13}, {30}}
	stillFluidBenchmark(b, args, func(x, _ float64) (float64, float64, error) { return PulsatileTube(x) })
}

func BenchmarkThinFilm(b *testing.B) {
	stillFluidBenchmark(b, [][2]float64{{0.1, 1}, {30, 0.3}, {1000, 1}, {1e5, 0.5}}, ThinFilm)
}
