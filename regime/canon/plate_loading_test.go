package canon

import (
	"fmt"
	"math"
	"sync"
	"testing"

	"pgregory.net/rapid"
)

func TestCircularPlateModeAgainstPublishedValues(t *testing.T) {
	// Leissa 1969, chapter 2, from memory.
	rows := []struct {
		edge               CircularEdge
		circles, diameters int
		λ2                 float64
	}{
		{CircularClamped, 0, 0, 10.2158}, {CircularClamped, 1, 0, 39.7711}, {CircularClamped, 2, 0, 89.1041},
		{CircularClamped, 0, 1, 21.2604}, {CircularClamped, 0, 2, 34.8770}, {CircularClamped, 1, 1, 60.8287},
		{CircularSimplySupported, 0, 0, 4.9351}, {CircularSimplySupported, 0, 1, 13.8982},
		{CircularSimplySupported, 0, 2, 25.6133}, {CircularSimplySupported, 1, 0, 29.7200},
		{CircularFree, 0, 2, 5.3583}, {CircularFree, 0, 3, 12.4390}, {CircularFree, 1, 0, 9.0031}, {CircularFree, 1, 1, 20.4746},
	}
	ran := 0
	for _, r := range rows {
		got := structureMust(t)(CircularPlateMode(r.edge, r.circles, r.diameters, 0.3))
		structureClose(t, fmt.Sprintf("%s %d %d", circularEdgeNames[r.edge], r.circles, r.diameters), got, r.λ2, 1e-5)
		ran++
	}
	if ran != 14 {
		t.Errorf("ran %d rows", ran)
	}
	tally(t, "CircularPlateMode", "published values", ran)
}

func TestCircularPlateModesAreOrthogonal(t *testing.T) {
	for edge := CircularClamped; edge <= CircularFree; edge++ {
		for _, s := range []int{0, 1, 2, 7} {
			var shapes []discShape
			for circles := range 5 {
				if edge == CircularFree && circles == 0 && s < 2 {
					continue
				}
				shapes = append(shapes, discModeShape(edge, discRoot(edge, circles, s, 0.3), s, 0.3))
			}
			for i, a := range shapes {
				for _, b := range shapes[:i] {
					product := 0.0
					for j := range min(len(a.c), len(b.c)) {
						product += a.c[j] * b.c[j] / (2 * float64(a.order(j)))
					}
					structureClose(t, "product", product/math.Sqrt(a.square*b.square), 0, 1e-11)
				}
			}
		}
	}
	tally(t, "CircularPlateMode", "orthogonality of the modes", 112)
}

func TestCircularPlateElasticEdge(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		κ := math.Pow(10, rapid.Float64Range(-4, 8).Draw(t, "log kappa"))
		circles, s := rapid.IntRange(0, 10).Draw(t, "circles"), rapid.IntRange(0, 10).Draw(t, "diameters")
		ν := rapid.Float64Range(0, 0.5).Draw(t, "nu")
		must := structureMust(t)
		soft := must(CircularPlateMode(CircularSimplySupported, circles, s, ν))
		hard := must(CircularPlateMode(CircularClamped, circles, s, ν))
		λ2 := must(ElasticCircularPlateMode(κ, circles, s, ν))
		more := must(ElasticCircularPlateMode(2*κ, circles, s, ν))
		if !(soft <= λ2 && λ2 <= more && more <= hard*(1+1e-12)) {
			t.Fatalf("%g %g %g %g", soft, λ2, more, hard)
		}
	})
	structureClose(t, "limit", structureMust(t)(ElasticCircularPlateMode(1e11, 0, 0, 0.3)), 10.215826230, 1e-9)
	structureClose(t, "no spring", structureMust(t)(ElasticCircularPlateMode(0, 0, 0, 0.3)), 4.9351, 1e-5)
	tally(t, "ElasticCircularPlateMode", "between the two edges, rising", 1)
	tally(t, "ElasticCircularPlateMode", "published ends 4.9351 and 10.2158", 2)
}

func TestFreeDiscModesAreCounted(t *testing.T) {
	// Between one root and the next of the same number of diameters the free edge's
	// roots interleave with those of the clamped edge: free n = clamped n−1 and a bit
	// less, for n ≥ 1 (Leissa 1969: 9.003 and 10.216, 38.443 and 39.771).
	for s := range 11 {
		for circles := 1; circles <= 10; circles++ {
			free := discRoot(CircularFree, circles, s, 0.3)
			below := discRoot(CircularClamped, circles-1, s, 0.3)
			if s < 2 && !(free < below) || s >= 2 && !(free > below-0.35 && free < below+0.35*float64(s)) {
				t.Errorf("s %d, n %d: free %g, clamped %g", s, circles, free, below)
			}
			if apart := free - discRoot(CircularClamped, circles-1, s, 0.3); math.Abs(apart) > math.Pi {
				t.Errorf("s %d, n %d: a root is missed", s, circles)
			}
		}
	}
	tally(t, "CircularPlateMode", "roots of free and clamped edge interleave", 110)
}

func TestDiscBesselTable(t *testing.T) {
	for _, x := range []float64{1e-9, 0.01, 1, 10, 60, 210} {
		table := make([]float64, 120)
		discBesselTable(table, x)
		for order, got := range table {
			structureClose(t, "J", got, math.Jn(order, x), 3e-14)
		}
	}
	for _, x := range []float64{1e-6, 0.5, 5, 50} {
		for s := range 12 {
			structureClose(t, "ratio of I", discIScaled(s+1, x)/discIScaled(s, x)/discIRatio(s, x), 1, 1e-12)
		}
	}
	structureClose(t, "I₀(1)/e", discIScaled(0, 1), 1.266065877752008/math.E, 1e-14)
}

func TestCircularAddedMassOfKnownShapes(t *testing.T) {
	lamb := newDiscShape(func(r float64) float64 { return (1 - r*r) * (1 - r*r) }, 0, 6)
	structureClose(t, "Lamb 1920", lamb.addedMass(), 0.6689, 1e-4)
	piston := newDiscShape(func(float64) float64 { return 1 }, 0, 3)
	structureClose(t, "piston", piston.addedMass(), 8/(3*math.Pi), 1e-13)
	for _, x := range []float64{0.1, 1, 7, 40} {
		structureClose(t, "piston's resistance", piston.baffledResistance(x, 1), 1-math.J1(2*x)/x, 1e-12)
	}
	exact := structureMust(t)(CircularPlateAddedMass(CircularClamped, 0, 0, 0.3))
	structureClose(t, "exact shape against Lamb's", exact/lamb.addedMass(), 1, 0.03)
	structureClose(t, "exact shape", exact, 0.65380, 1e-4)
	tally(t, "CircularPlateAddedMass", "Lamb's shape 0.6689", 1)
	tally(t, "CircularPlateAddedMass", "piston 8/(3π)", 1)
	tally(t, "BaffledCircularPlateMode", "piston's resistance", 4)
}

func TestCircularAddedMassOfHighModes(t *testing.T) {
	// Towards ρ/k_b per area: the coefficient goes to 1/λ.
	for edge := CircularClamped; edge <= CircularFree; edge++ {
		last := math.Inf(1)
		for circles := 1; circles <= 10; circles++ {
			coefficient := structureMust(t)(CircularPlateAddedMass(edge, circles, 2, 0.3))
			λ := discRoot(edge, circles, 2, 0.3)
			excess := math.Abs(coefficient*λ - 1)
			if excess > last {
				t.Errorf("%s %d: %g from 1 after %g", circularEdgeNames[edge], circles, excess, last)
			}
			last = excess
		}
		if last > 0.12 {
			t.Errorf("%s: still %g from the infinite plate", circularEdgeNames[edge], last)
		}
	}
	tally(t, "CircularPlateAddedMass", "towards 1/λ with every circle", 30)
}

func TestBaffledCircularPlate(t *testing.T) {
	for edge := CircularClamped; edge <= CircularSimplySupported; edge++ {
		for _, mode := range [][2]int{{0, 0}, {1, 0}, {0, 1}, {2, 3}, {10, 10}} {
			still := structureMust(t)(CircularPlateAddedMass(edge, mode[0], mode[1], 0.3))
			mass, resistance, err := BaffledCircularPlateMode(edge, mode[0], mode[1], 0.3, 1e-6)
			if err != nil {
				t.Fatal(err)
			}
			structureClose(t, "low frequency", mass, still, 1e-7)
			if resistance < 0 || resistance > 1e-10 {
				t.Errorf("resistance %g without sound", resistance)
			}
		}
		_, resistance, _ := BaffledCircularPlateMode(edge, 0, 0, 0.3, 60)
		structureClose(t, "high frequency", resistance, 1, 2e-3)
	}
	// Low frequency: a monopole of the mode's volume, r̂ = k₀²V²/(2π∫W²dA).
	shape := discModeShape(CircularClamped, discRoot(CircularClamped, 0, 0, 0.3), 0, 0.3)
	mean := shape.c[0] / 2 // ∫W r dr
	_, resistance, _ := BaffledCircularPlateMode(CircularClamped, 0, 0, 0.3, 0.01)
	structureClose(t, "monopole", resistance/(1e-4*mean*mean/shape.square), 1, 1e-4)
	if _, _, err := BaffledCircularPlateMode(CircularFree, 1, 0, 0.3, 1); err == nil {
		t.Error("a free edge is accepted")
	}
	tally(t, "BaffledCircularPlateMode", "monopole of the volume", 1)
	tally(t, "CircularPlateAddedMass", "integral over wave numbers", 10)
}

func baffled(t checkReporter, x, y BeamSupport, aspect float64, m, n int, k0a float64) (mass, resistance float64) {
	t.Helper()
	mass, resistance, err := BaffledPlateMode(x, y, aspect, m, n, k0a)
	if err != nil {
		t.Fatal(err)
	}
	return mass, resistance
}

func TestBeamCorrelationAndPower(t *testing.T) {
	for _, s := range allBeamSupports {
		for _, n := range []int{1, 2, 5, 10} {
			f := newBeamFunction(s, n)
			r := newBeamCorrelation(&f)
			for _, ξ := range []float64{0, 0.1, 0.37, 0.8, 1} {
				product := integrateBeam(func(x float64) float64 {
					x *= 1 - ξ
					return (1 - ξ) * f.derivative(0, x) * f.derivative(0, x+ξ)
				})
				structureClose(t, "correlation", r.at(ξ), product, 1e-13)
			}
			for _, k := range []float64{0, 1e-5, 0.3, f.β, 40} {
				a := integrateBeam(func(x float64) float64 { return f.derivative(0, x) * math.Cos(k*x) })
				b := integrateBeam(func(x float64) float64 { return f.derivative(0, x) * math.Sin(k*x) })
				structureClose(t, "power", f.power(k), a*a+b*b, 1e-13)
			}
		}
	}
}

func TestBaffledSquarePlate(t *testing.T) {
	mass, resistance := baffled(t, PinnedPinned, PinnedPinned, 1, 1, 1, 0)
	structureClose(t, "first mode", mass, 0.409496, 1e-6)
	if resistance != 0 {
		t.Errorf("resistance %g of a still fluid", resistance)
	}
	// The same by the spectrum, ∫|Ŵ|²/k d²k/4π², which converges as 1/k⁴.
	f := newBeamFunction(PinnedPinned, 1)
	structureClose(t, "spectrum", spectralMass(&f, &f, 1, 100), mass, 1e-6)
	g := newBeamFunction(ClampedClamped, 2)
	clamped, _ := baffled(t, ClampedClamped, PinnedPinned, 1.6, 2, 1, 0)
	structureClose(t, "spectrum", spectralMass(&g, &f, 1/1.6, 100), clamped, 1e-6)
	tally(t, "BaffledPlateMode", "mass by the spectrum", 2)
}

// spectralMass is ∫|X̂|²|Ŷ|² dk dφ/(4π²) over a quarter, four times, for sides 1 and b.
func spectralMass(x, y *beamFunction, b, top float64) float64 {
	angles, panel := legendreRuleFor(240), legendreRuleFor(12)
	sum := 0.0
	for p := range int(top / 2) {
		for i, u := range panel.x {
			k := 2 * (float64(p) + u)
			for j, v := range angles.x {
				sin, cos := math.Sincos(0.5 * math.Pi * v)
				sum += 2 * panel.w[i] * angles.w[j] * 0.5 * math.Pi * x.power(k*cos) * y.power(k*b*sin)
			}
		}
	}
	return b * sum / (math.Pi * math.Pi)
}

func TestBaffledPlateHighModes(t *testing.T) {
	for _, s := range []BeamSupport{PinnedPinned, ClampedClamped, ClampedPinned} {
		mass, _ := baffled(t, s, s, 1, 10, 10, 0)
		f := newBeamFunction(s, 10)
		structureClose(t, s.String(), mass*f.β*math.Sqrt2, 1, 0.06)
	}
	tally(t, "BaffledPlateMode", "many half waves: ρ/k_b", 3)
}

// TestBaffledPlateLowFrequency compares with Wallace 1972 (from memory) for modes of
// odd numbers, and the powers of frequency for the others.
func TestBaffledPlateLowFrequency(t *testing.T) {
	ran := 0
	for _, aspect := range []float64{0.4, 1, 3} {
		for _, mode := range [][2]int{{1, 1}, {1, 3}, {3, 1}, {3, 3}, {5, 3}} {
			b := 1 / aspect
			k := 0.2 / math.Max(1, b)
			m, n := float64(mode[0]), float64(mode[1])
			p, q := 8/(m*m*math.Pi*math.Pi), 8/(n*n*math.Pi*math.Pi)
			want := 32 * k * k * b / (math.Pow(math.Pi, 5) * m * m * n * n) *
				(1 - k*k*b/12*((1-p)*aspect+(1-q)*b))
			_, got := baffled(t, PinnedPinned, PinnedPinned, aspect, mode[0], mode[1], k)
			structureClose(t, fmt.Sprint(mode, aspect), got/want, 1, 3e-5)
			ran++
		}
	}
	if ran != 15 {
		t.Errorf("ran %d rows", ran)
	}
	for _, c := range []struct {
		m, n  int
		power float64
	}{{1, 1, 2}, {1, 2, 4}, {2, 1, 4}, {2, 2, 6}} {
		_, low := baffled(t, PinnedPinned, PinnedPinned, 1, c.m, c.n, 0.01)
		_, high := baffled(t, PinnedPinned, PinnedPinned, 1, c.m, c.n, 0.02)
		structureClose(t, "power of frequency", math.Log2(high/low), c.power, 1e-3)
	}
	tally(t, "BaffledPlateMode", "low-frequency forms", ran+4)
}

// TestBaffledResistanceByRayleighsIntegral finds the resistance in space, where the
// kernel sin(k₀r)/r is smooth, instead of over directions.
func TestBaffledResistanceByRayleighsIntegral(t *testing.T) {
	rule := legendreRuleFor(100)
	ran := 0
	for _, c := range []struct {
		x, y   BeamSupport
		aspect float64
		m, n   int
		k0     float64
	}{
		{PinnedPinned, PinnedPinned, 1, 1, 1, 3}, {ClampedClamped, PinnedPinned, 0.5, 2, 3, 10},
		{ClampedPinned, ClampedClamped, 2, 5, 1, 30}, {ClampedFree, FreeFree, 1.5, 1, 2, 8},
	} {
		x, y := newBeamFunction(c.x, c.m), newBeamFunction(c.y, c.n)
		rx, ry := newBeamCorrelation(&x), newBeamCorrelation(&y)
		b := 1 / c.aspect
		sum := 0.0
		for i, ξ := range rule.x {
			for j, η := range rule.x {
				r := math.Hypot(ξ, b*η)
				sum += rule.w[i] * rule.w[j] * rx.at(ξ) * ry.at(η) * math.Sin(c.k0*r) / r
			}
		}
		_, got := baffled(t, c.x, c.y, c.aspect, c.m, c.n, c.k0)
		structureClose(t, fmt.Sprint(c), got, 2/math.Pi*c.k0*b*sum, 1e-9)
		ran++
	}
	if ran != 4 {
		t.Errorf("ran %d rows", ran)
	}
	tally(t, "BaffledPlateMode", "resistance by Rayleigh's integral in space", ran)
}

func TestBaffledPlateIdentities(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.SampledFrom(allBeamSupports).Draw(t, "edgesX")
		y := rapid.SampledFrom(allBeamSupports).Draw(t, "edgesY")
		aspect := math.Exp(rapid.Float64Range(-1.2, 1.2).Draw(t, "log aspect"))
		m, n := rapid.IntRange(1, 10).Draw(t, "m"), rapid.IntRange(1, 10).Draw(t, "n")
		k0a := rapid.Float64Range(0, 15).Draw(t, "k0a")
		mass, resistance := baffled(t, x, y, aspect, m, n, k0a)
		turned, same := baffled(t, y, x, 1/aspect, n, m, k0a/aspect)
		structureClose(t, "reciprocal mass", turned, mass*aspect, 1e-9)
		structureClose(t, "reciprocal resistance", same, resistance, 1e-9)
		if resistance < 0 || resistance > 4 {
			t.Fatalf("resistance %g", resistance)
		}
		still, _ := baffled(t, x, y, aspect, m, n, 0)
		if still <= 0 {
			t.Fatalf("mass %g of a still fluid", still)
		}
		// More nodes change nothing.
		f, g := newBeamFunction(x, m), newBeamFunction(y, n)
		structureClose(t, "nodes", baffledMass(&f, &g, 1/aspect, k0a, 1.5), mass, 1e-9)
	})
	tally(t, "BaffledPlateMode", "reciprocity of the two sides", 2)
}

func TestBaffledPlateRadiatesAsPlaneWaveAboveCoincidence(t *testing.T) {
	for _, s := range []BeamSupport{PinnedPinned, ClampedClamped} {
		mass, resistance := baffled(t, s, s, 1, 1, 1, 60)
		structureClose(t, "resistance", resistance, 1, 5e-3)
		structureClose(t, "mass", mass, 0, 1e-3)
	}
	// An infinite plate: 1/√(1 − (k_b/k₀)²).
	_, resistance := baffled(t, PinnedPinned, PinnedPinned, 1, 6, 6, 50)
	s := 6 * math.Pi * math.Sqrt2 / 50
	structureClose(t, "infinite plate", resistance, 1/math.Sqrt(1-s*s), 0.05)
}

func TestBaffledPlateRefusals(t *testing.T) {
	refused := []error{}
	for _, c := range []struct {
		x, y   BeamSupport
		aspect float64
		m, n   int
		k0a    float64
	}{
		{-1, 0, 1, 1, 1, 0}, {0, 5, 1, 1, 1, 0}, {0, 0, 20, 1, 1, 0}, {0, 0, 1, 0, 1, 0}, {0, 0, 1, 1, 11, 0},
		{0, 0, 1, 1, 1, 61}, {0, 0, 0.1, 1, 1, 13}, {0, 0, 1, 1, 1, math.NaN()},
	} {
		_, _, err := BaffledPlateMode(c.x, c.y, c.aspect, c.m, c.n, c.k0a)
		if err == nil {
			t.Errorf("%+v is accepted", c)
		}
		refused = append(refused, err)
	}
	if len(refused) != 8 {
		t.Errorf("ran %d rows", len(refused))
	}
}

func TestCavityStiffness(t *testing.T) {
	must := structureMust(t)
	structureClose(t, "first mode", must(CavityStiffness(PinnedPinned, PinnedPinned, 1, 1)), 64/math.Pow(math.Pi, 4), 1e-14)
	structureClose(t, "even mode", must(CavityStiffness(PinnedPinned, ClampedClamped, 1, 2)), 0, 0)
	for _, s := range allBeamSupports {
		b, _ := BeamModeFactors(s, 3)
		c, _ := BeamModeFactors(ClampedClamped, 1)
		want := math.Pow(b.Mean*c.Mean, 2) / (b.MeanSquare * c.MeanSquare)
		structureClose(t, s.String(), must(CavityStiffness(s, ClampedClamped, 3, 1)), want, 1e-12)
	}
	// Bessel's inequality: the parts of a uniform lift sum to 1.
	sum := 0.0
	for n := 1; n < 4000; n++ {
		sum += must(CavityStiffness(ClampedClamped, PinnedPinned, n, 1)) / (8 / (math.Pi * math.Pi))
	}
	structureClose(t, "completeness", sum, 1, 1e-3)
	tally(t, "CavityStiffness", "64/π⁴ by hand", 2)
	tally(t, "CavityStiffness", "mean and mean square of the shape", len(allBeamSupports))
	tally(t, "CavityStiffness", "Bessel's inequality is an equation", 1)
}

func TestSolvedMemoIsBoundedAndShared(t *testing.T) {
	m := newSolvedMemo[int, int](8)
	var wait sync.WaitGroup
	for g := range 8 {
		wait.Go(func() {
			for i := range 500 {
				key := (i*7 + g) % 40
				if v := m.of(key, func() int { return key * key }); v != key*key {
					t.Errorf("key %d gives %d", key, v)
				}
			}
		})
	}
	wait.Wait()
	if n := m.size(); n > 16 {
		t.Errorf("holds %d entries", n)
	}
	solved := 0
	for range 3 {
		m.of(1000, func() int { solved++; return 1 })
	}
	if solved != 1 {
		t.Errorf("solved %d times", solved)
	}
}

func TestLegendreRuleIsExact(t *testing.T) {
	for _, n := range []int{4, 20, 100, 1024} {
		rule := legendreRuleFor(n)
		for _, p := range []int{0, 1, 3, n, 2*n - 1} {
			sum := 0.0
			for i, x := range rule.x {
				sum += rule.w[i] * math.Pow(x, float64(p))
			}
			structureClose(t, "power", sum*float64(p+1), 1, 1e-12)
		}
	}
}

func BenchmarkBaffledPlateMode(b *testing.B) {
	for _, k := range []baffledKey{
		{x: PinnedPinned, y: PinnedPinned, aspect: 1, m: 1, n: 1},
		{x: ClampedClamped, y: ClampedClamped, aspect: 1, m: 1, n: 1},
		{x: PinnedPinned, y: PinnedPinned, aspect: 1, m: 1, n: 1, k0: 1},
		{x: ClampedClamped, y: ClampedClamped, aspect: 1, m: 10, n: 10, k0: 60},
	} {
		b.Run(fmt.Sprint(k), func(b *testing.B) {
			for b.Loop() {
				solveBaffledPlate(k)
			}
		})
	}
	b.Run("remembered", func(b *testing.B) {
		for b.Loop() {
			_, _, _ = BaffledPlateMode(PinnedPinned, PinnedPinned, 1, 1, 1, 0)
		}
	})
}

func BenchmarkCircularPlate(b *testing.B) {
	b.Run("mode", func(b *testing.B) {
		for b.Loop() {
			_, _ = CircularPlateMode(CircularClamped, 0, 0, 0.3)
		}
	})
	b.Run("added mass", func(b *testing.B) {
		for b.Loop() {
			shape := discModeShape(CircularClamped, 3.19622, 0, 0.3)
			shape.addedMass()
		}
	})
	b.Run("baffled", func(b *testing.B) {
		shape := discModeShape(CircularClamped, 3.19622, 0, 0.3)
		for b.Loop() {
			shape.baffledMass(5, 3.19622, 1)
			shape.baffledResistance(5, 1)
		}
	})
}
