package canon

import (
	"math"
	"strings"
	"testing"

	"gonum.org/v1/gonum/mat"
	"pgregory.net/rapid"
)

func plateLambda2(t checkReporter, edges string, aspect float64, m, n int, nu float64) float64 {
	t.Helper()
	λ2, _, err := PlateMode(edges, aspect, m, n, nu)
	return structureMust(t)(λ2, err)
}

func TestPlateModeAgainstPublishedValues(t *testing.T) {
	// Leissa 1973 for ν = 0.3, square unless said, from memory. His values with a free
	// edge next to a clamped one come from few beam functions and lie up to 1 % high;
	// the exact ones (Lévy) are met to all digits.
	rows := []struct {
		edges     string
		aspect    float64
		m, n      int
		λ2        float64
		tolerance float64
	}{
		{"SSSS", 1, 1, 1, 19.7392, 1e-5},
		{"SSSS", 1, 2, 1, 49.3480, 1e-5},
		{"CCCC", 1, 1, 1, 35.99, 2e-4},
		{"CCCC", 1, 2, 1, 73.41, 5e-4},
		{"CCCC", 1, 2, 2, 108.22, 5e-4},
		{"CCCC", 1, 3, 1, 131.64, 1e-3},
		{"CCCC", 1, 1, 3, 132.24, 1e-3},
		{"SCSC", 1, 1, 1, 28.9509, 1e-5},
		{"CSCS", 1, 1, 1, 28.9509, 1e-5},
		{"SSSC", 1, 1, 1, 23.6463, 1e-5},
		{"SCSF", 1, 1, 1, 12.6874, 1e-5},
		{"SSSF", 1, 1, 1, 11.6845, 1e-5},
		{"SFSF", 1, 1, 1, 9.6314, 1e-5},
		{"CCSS", 1, 1, 1, 27.056, 2e-4},
		{"CCCS", 1, 1, 1, 31.829, 2e-4},
		{"CFFF", 1, 1, 1, 3.4917, 1e-2},
		{"CFFF", 1, 2, 1, 8.5246, 1e-2},
		{"CFFF", 1, 3, 1, 21.429, 1e-2},
		{"CCCF", 1, 1, 1, 24.020, 1e-2},
		{"CCFF", 1, 1, 1, 6.9421, 1e-2},
		{"CFCF", 1, 1, 1, 22.272, 1e-2},
		{"SSFF", 1, 1, 1, 3.3687, 1e-3},
		{"SFFF", 1, 1, 1, 6.6480, 1e-3},
		{"FFFF", 1, 1, 1, 13.489, 2e-3},
		{"FFFF", 1, 2, 1, 19.789, 1e-2},
		{"FFFF", 1, 3, 1, 24.432, 1e-2},
	}
	ran := 0
	for _, r := range rows {
		got := plateLambda2(t, r.edges, r.aspect, r.m, r.n, 0.3)
		structureClose(t, r.edges, got/r.λ2, 1, r.tolerance)
		if got > r.λ2*1.0001 {
			t.Errorf("%s (%d, %d): %g lies above a published upper bound %g", r.edges, r.m, r.n, got, r.λ2)
		}
		ran++
	}
	if ran != 26 {
		t.Errorf("ran %d rows", ran)
	}
	structureClose(t, "clamped square to six digits", plateLambda2(t, "CCCC", 1, 1, 1, 0.3), 35.985, 1e-4)
	tally(t, "PlateMode", "published table of the combinations of edges", ran+1)
}

func TestPlateUncertaintyCoversLargerSets(t *testing.T) {
	for _, edges := range []string{"CFFF", "CCFF", "CFCF", "FFFF", "CCCC", "CCSS"} {
		λ2, δ, err := PlateMode(edges, 1, 1, 1, 0.3)
		if err != nil {
			t.Fatal(err)
		}
		lowest := math.Inf(1)
		for _, px := range paritiesOf(edges[0], edges[2]) {
			for _, py := range paritiesOf(edges[1], edges[3]) {
				x := newPlateBasis(edges[0], edges[2], px, 13, nil)
				y := newPlateBasis(edges[1], edges[3], py, 13, nil)
				modes := plateModesOf(x, y, 1, 0.3)
				lowest = math.Min(lowest, modes[0].fine)
			}
		}
		if lowest > λ2*(1+1e-9) || λ2/lowest-1 > δ+1e-10 {
			t.Errorf("%s: %.8g with uncertainty %.2g, %.8g with more polynomials", edges, λ2, δ, lowest)
		}
	}
}

func TestPlatePolynomialsAreOrthonormal(t *testing.T) {
	for _, ends := range []string{"FF", "SF", "CF", "SS", "CS", "CC", "FS", "FC", "SC"} {
		size := 9
		rule := legendreRuleFor(40)
		var gram [9][9]float64
		values := make([][3]float64, size)
		for k, x := range rule.x {
			evaluatePlateBasis(values, x, endExponent(ends[0]), endExponent(ends[1]), 0, 1)
			for i := range size {
				for j := range size {
					gram[i][j] += rule.w[k] * values[i][0] * values[j][0]
				}
			}
		}
		for i := range size {
			for j := range size {
				want := 0.0
				if i == j {
					want = 1
				}
				structureClose(t, ends, gram[i][j], want, 1e-12)
			}
		}
	}
}

func TestPlatePolynomialsReproduceTheSine(t *testing.T) {
	// The same plate by polynomials in both directions, without the sine along x.
	for _, edges := range []string{"SCSC", "SFSF", "SSSF", "SSSS", "SCSF"} {
		x := newPlateBasis('S', 'S', evenParity, 8, nil)
		y := newPlateBasis(edges[1], edges[3], allParities, 12, nil)
		λ4, _ := plateEigenvalues(plateEnergy(x, y, 0.8, 0.3), false)
		structureClose(t, edges, math.Sqrt(λ4[0])/plateLambda2(t, edges, 0.8, 1, 1, 0.3), 1, 1e-8)
	}
	tally(t, "PlateMode", "Ritz in both directions against the sine", 5)
}

func TestPlateStripsAreBeams(t *testing.T) {
	// A strip clamped or simply supported along its long sides, bent to a cylinder.
	structureClose(t, "clamped strip", plateLambda2(t, "CCCC", 0.1, 1, 1, 0.3)/22.3733, 1, 0.01)
	// A slender cantilever bends with EI = D(1 − ν²) per width; it twists within.
	structureClose(t, "cantilever beam", plateLambda2(t, "CFFF", 10, 1, 1, 0.3)/(3.516015*math.Sqrt(0.91)), 1, 0.01)
	structureClose(t, "cantilever plate", plateLambda2(t, "CFFF", 0.1, 1, 1, 0.3)/3.516015, 1, 0.005)
	structureClose(t, "free beam", plateLambda2(t, "FFFF", 10, 1, 1, 0.3)/(22.3733*math.Sqrt(0.91)), 1, 0.002)
	structureClose(t, "no Poisson effect", plateLambda2(t, "SFSF", 1, 1, 1, 0), math.Pi*math.Pi, 1e-9)
	tally(t, "PlateMode", "strips and slender cantilevers are beams", 5)
}

func TestPlateModesAreReciprocal(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		edges := rapid.SampledFrom(plateEdgeNames).Draw(t, "edges")
		aspect := math.Exp(rapid.Float64Range(-2.3, 2.3).Draw(t, "log aspect"))
		if aspect == 1 {
			aspect = 1.001 // of a square's mixed modes m > n is the lower by convention
		}
		m, n := rapid.IntRange(1, 3).Draw(t, "m"), rapid.IntRange(1, 3).Draw(t, "n")
		k := plateKey{edges: [4]byte([]byte(edges))}
		turned := string([]byte{edges[1], edges[0], edges[3], edges[2]})
		m2, n2 := n, m
		if k.ranked() {
			n, m2, n2 = 1, m, 1
		}
		a, δ, err := PlateMode(edges, aspect, m, n, 0.3)
		if err != nil {
			t.Fatal(err)
		}
		b := plateLambda2(t, turned, 1/aspect, m2, n2, 0.3)
		structureClose(t, edges, b*aspect*aspect/a, 1, 1e-9+δ)
	})
	tally(t, "PlateMode", "reciprocity of the two sides", 1)
}

func TestPlateStiffensWithItsEdges(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		edges := rapid.StringMatching("[CSF]{4}").Draw(t, "edges")
		aspect := rapid.Float64Range(0.3, 3).Draw(t, "aspect")
		side := rapid.IntRange(0, 3).Draw(t, "side")
		if edges[side] != 'S' || strings.Contains(edges, "F") {
			return // between free plates the number of rigid motions shifts the rank
		}
		stiffer := edges[:side] + "C" + edges[side+1:]
		if a, b := plateLambda2(t, edges, aspect, 1, 1, 0.3), plateLambda2(t, stiffer, aspect, 1, 1, 0.3); b <= a {
			t.Fatalf("%s %g, %s %g", edges, a, stiffer, b)
		}
	})
	// Along one direction, free to simply supported to clamped.
	for _, aspect := range []float64{0.2, 1, 5} {
		order := []string{"CFFF", "CFSF", "CFCF", "CSCF", "CCCF", "CCCS", "CCCC"}
		last := 0.0
		for _, edges := range order {
			λ2 := plateLambda2(t, edges, aspect, 1, 1, 0.3)
			if λ2 <= last {
				t.Errorf("aspect %g: %s gives %g after %g", aspect, edges, λ2, last)
			}
			last = λ2
		}
	}
}

func TestPlateModeRanksRise(t *testing.T) {
	for _, edges := range []string{"CFFF", "FFFF", "SSFF", "CCFF", "SFFF"} {
		for _, aspect := range []float64{0.1, 1, 10} {
			last := 0.0
			for rank := 1; rank <= plateModeLimit; rank++ {
				λ2 := plateLambda2(t, edges, aspect, rank, 1, 0.3)
				if λ2 < last*(1-2e-3) || λ2 < 0.2*math.Min(1, aspect*aspect) {
					t.Errorf("%s %g rank %d: %g after %g", edges, aspect, rank, λ2, last)
				}
				last = λ2
			}
		}
	}
}

func TestPlateModeRefusals(t *testing.T) {
	rows := []struct {
		edges  string
		aspect float64
		m, n   int
		nu     float64
	}{
		{"CCC", 1, 1, 1, 0.3}, {"CCCX", 1, 1, 1, 0.3}, {"CCCC", 11, 1, 1, 0.3}, {"CCCC", math.NaN(), 1, 1, 0.3},
		{"CCCC", 1, 0, 1, 0.3}, {"CCCC", 1, 1, 11, 0.3}, {"CCCC", 1, 1, 1, 0.6}, {"CFFF", 1, 1, 2, 0.3},
	}
	ran := 0
	for _, r := range rows {
		if _, _, err := PlateMode(r.edges, r.aspect, r.m, r.n, r.nu); err == nil {
			t.Errorf("%+v is accepted", r)
		}
		ran++
	}
	if ran != 8 {
		t.Errorf("ran %d rows", ran)
	}
}

func TestPlateEnergyIsSymmetric(t *testing.T) {
	x, y := newPlateBasis('C', 'F', allParities, 5, nil), newPlateBasis('S', 'F', allParities, 4, nil)
	// Build it as a full matrix by exchanging rows and columns of the directions.
	a, b := plateEnergy(x, y, 1.3, 0.3), plateEnergy(y, x, 1/1.3, 0.3)
	s4 := math.Pow(1.3, 4)
	var largest float64
	for i := range 20 {
		for j := range 20 {
			largest = math.Max(largest, math.Abs(a.At(i, j)-s4*b.At(i%4*5+i/4, j%4*5+j/4)))
		}
	}
	if largest > 1e-9*mat.Norm(a, 2) {
		t.Errorf("exchange of the directions changes the energy by %g", largest)
	}
}

func TestLargeAmplitude(t *testing.T) {
	must := structureMust(t)
	rows := []struct {
		kind             LargeAmplitudeKind
		ratio, want, tol float64
	}{
		{ImmovableSimplySupportedPlate, 0.2, 1.0195, 1e-4}, // Chu & Herrmann 1956, from memory
		{ImmovableSimplySupportedPlate, 1, 1.402, 5e-4},
		{ImmovablePinnedBeam, 1, 1.0892, 1e-4}, // Woinowsky-Krieger 1950, from memory
		{ImmovablePinnedBeam, 0.1, math.Sqrt(1 + 3.0/16*0.01), 1e-6},
		{ImmovableClampedSquarePlate, 0.2, math.Sqrt(1 + 0.3705*0.04), 1e-5},
	}
	ran := 0
	for _, r := range rows {
		structureClose(t, largeAmplitudeNames[r.kind], must(LargeAmplitude(r.kind, r.ratio, 1, 0.3)), r.want, r.tol)
		ran++
	}
	if ran != 5 {
		t.Errorf("ran %d rows", ran)
	}
	rapid.Check(t, func(t *rapid.T) {
		kind := LargeAmplitudeKind(rapid.IntRange(0, 5).Draw(t, "kind"))
		ratio := rapid.Float64Range(0, 0.9).Draw(t, "ratio")
		aspect := rapid.Float64Range(0.1, 10).Draw(t, "aspect")
		a := structureMust(t)(LargeAmplitude(kind, ratio, aspect, 0.3))
		b := structureMust(t)(LargeAmplitude(kind, ratio+0.1, aspect, 0.3))
		ε := stretchingCoefficient(kind, aspect, 0.3) * ratio * ratio
		if a < 1 || b <= a || a > math.Sqrt(1+0.75*ε)+1e-15 {
			t.Fatalf("%g then %g, first order %g", a, b, math.Sqrt(1+0.75*ε))
		}
		if kind == ImmovableSimplySupportedPlate {
			structureClose(t, "turned plate", structureMust(t)(LargeAmplitude(kind, ratio, 1/aspect, 0.3)), a, 1e-12)
		}
	})
	// A very stiff spring: ω → √ε·(2π/Γ(¼)²)·√π·… = 0.8472 √ε.
	structureClose(t, "purely cubic", duffingRatio(1e12)/1e6, 0.847213, 1e-6)
	// A long simply supported plate is a row of pinned beams, (w/r)² = 12(w/h)², whose
	// amplitude varies as a sine: the cubic term takes the factor ∫sin⁴/∫sin² = ¾.
	structureClose(t, "strip", stretchingCoefficient(ImmovableSimplySupportedPlate, 1e-4, 0), 12*0.25*0.75, 1e-6)
	tally(t, "LargeAmplitude", "published values", ran)
	tally(t, "LargeAmplitude", "below first order, and turned plate", 2)
	tally(t, "LargeAmplitude", "purely cubic 0.8472√ε", 1)
}

// TestStretchingByMembraneRitz finds the cubic stiffness of square plates anew,
// with in-plane displacements as a series of sines and cosines.
func TestStretchingByMembraneRitz(t *testing.T) {
	clamped := newBeamFunction(ClampedClamped, 1)
	peak := clamped.largest(0)
	beam := func(x float64) [3]float64 {
		return [3]float64{
			clamped.derivative(0, x) / peak, clamped.β * clamped.derivative(1, x) / peak,
			clamped.β * clamped.β * clamped.derivative(2, x) / peak,
		}
	}
	sine := func(x float64) [3]float64 {
		sin, cos := math.Sincos(math.Pi * x)
		return [3]float64{sin, math.Pi * cos, -math.Pi * math.Pi * sin}
	}
	structureClose(t, "clamped, edges held along and across", membraneStretching(beam, true), clampedSquareStretching, 5e-5)
	structureClose(t, "simply supported, edges held across", membraneStretching(sine, false), stretchingCoefficient(ImmovableSimplySupportedPlate, 1, 0.3), 1e-9)
	tally(t, "LargeAmplitude", "membrane by Ritz", 2)
}

// membraneStretching is ε/(w/h)² of a square plate of shape w(x)w(y), ν = 0.3.
func membraneStretching(shape func(x float64) [3]float64, heldAlong bool) float64 {
	const ν, terms = 0.3, 5
	rule := legendreRuleFor(40)
	size := 2 * terms * terms
	stiffness := mat.NewSymDense(size, nil)
	load := mat.NewVecDense(size, nil)
	strain := make([][3]float64, size)
	work := func(a, b [3]float64) float64 {
		return a[0]*b[0] + a[1]*b[1] + ν*(a[0]*b[1]+a[1]*b[0]) + 0.5*(1-ν)*a[2]*b[2]
	}
	unrelieved, bending := 0.0, 0.0
	for i, x := range rule.x {
		for j, y := range rule.x {
			weight := rule.w[i] * rule.w[j]
			wx, wy := shape(x), shape(y)
			membraneStrains(strain, x, y, terms, heldAlong)
			slopeX, slopeY := wx[1]*wy[0], wx[0]*wy[1]
			w := [3]float64{0.5 * slopeX * slopeX, 0.5 * slopeY * slopeY, slopeX * slopeY}
			unrelieved += weight * work(w, w)
			bending += weight * math.Pow(wx[2]*wy[0]+wx[0]*wy[2], 2)
			for a := range size {
				load.SetVec(a, load.AtVec(a)+weight*work(strain[a], w))
				for b := a; b < size; b++ {
					stiffness.SetSym(a, b, stiffness.At(a, b)+weight*work(strain[a], strain[b]))
				}
			}
		}
	}
	var factor mat.Cholesky
	if !factor.Factorize(stiffness) {
		return math.NaN()
	}
	var relief mat.VecDense
	if err := factor.SolveVecTo(&relief, load); err != nil {
		return math.NaN()
	}
	return 12 * 2 * (unrelieved - mat.Dot(&relief, load)) / bending
}

// membraneStrains fills in the strains of u = sin 2iπx·f(y) and of v likewise,
// f a sine where the edges hold the motion along them and a cosine if not.
func membraneStrains(strain [][3]float64, x, y float64, terms int, heldAlong bool) {
	half := len(strain) / 2
	for i := range terms {
		for j := range terms {
			p, q := 2*math.Pi*float64(i+1), 2*math.Pi*float64(j)
			if heldAlong {
				q += math.Pi
			}
			other := func(z float64) (f, df float64) {
				sin, cos := math.Sincos(q * z)
				if heldAlong {
					return sin, q * cos
				}
				return cos, -q * sin
			}
			fx, dfx := other(x)
			fy, dfy := other(y)
			k := i*terms + j
			strain[k] = [3]float64{p * math.Cos(p*x) * fy, 0, math.Sin(p*x) * dfy}
			strain[half+k] = [3]float64{0, p * math.Cos(p*y) * fx, math.Sin(p*y) * dfx}
		}
	}
}

func BenchmarkPlateMode(b *testing.B) {
	for _, k := range []plateKey{
		{edges: [4]byte([]byte("SCSC")), aspect: 1, m: 1, n: 1, nu: 0.3},
		{edges: [4]byte([]byte("CCCC")), aspect: 1, m: 1, n: 1, nu: 0.3},
		{edges: [4]byte([]byte("CCSS")), aspect: 1, m: 1, n: 1, nu: 0.3},
		{edges: [4]byte([]byte("CFFF")), aspect: 1, m: 1, n: 1, nu: 0.3},
		{edges: [4]byte([]byte("CCFF")), aspect: 1, m: 3, n: 1, nu: 0.3},
		{edges: [4]byte([]byte("CCCC")), aspect: 1, m: 10, n: 10, nu: 0.3},
	} {
		b.Run(string(k.edges[:]), func(b *testing.B) {
			for b.Loop() {
				solvePlate(k)
			}
		})
	}
	b.Run("remembered", func(b *testing.B) {
		for b.Loop() {
			_, _, _ = PlateMode("CCCC", 1, 1, 1, 0.3)
		}
	})
}
