package canon

import (
	"math"
	"math/cmplx"
	"testing"

	"pgregory.net/rapid"
)

func TestHazardDocumentedValues(t *testing.T) {
	runFlowChecks(t, 12, []flowCheck{
		{"PanelFlutter", []float64{2}, []float64{273.96}, 2e-5},
		{"PanelFlutter", []float64{4}, []float64{340.60}, 2e-5},
		{"PanelFlutter", []float64{10}, []float64{343.34}, 2e-5},
		{"PanelFlutter", []float64{20}, []float64{343.36}, 2e-5},
		{"PanelDivergence", []float64{0}, []float64{15.503}, 1e-4},
		{"PanelDivergence", []float64{1}, []float64{7.7516}, 1e-4},
		{"FlagCritical", []float64{1, 1e9}, []float64{8.5878}, 1e-5},
		{"FlagCritical", []float64{1, 1}, []float64{10.0899}, 1e-4},
		{"GallopingSpeed", []float64{10, 1.2}, []float64{16.667}, 1e-4},
		{"GallopingFactor", []float64{1}, []float64{1.2, 1}, 1e-12},
		{"GallopingFactor", []float64{2, 2}, []float64{2, 1}, 1e-12},
		{"TubeArrayCritical", []float64{1}, []float64{3}, 1e-12},
	})
	tally(t, "PanelFlutter", "published values of 2, 4, 10 modes", 4)
	tally(t, "GallopingSpeed", "square section by hand", 1)
}

// Just below the critical pressure all Ω² are real, just above two are not, and
// the converged λ is a double zero of the exact boundary determinant.
func TestPanelFlutterIsTheFirstMeeting(t *testing.T) {
	rows := 0
	for _, modes := range []int{2, 3, 6, 10, 20} {
		for _, aspect := range []float64{0, 0.5, 1, 2, 3} {
			lambda, omega, err := PanelFlutter(modes, aspect)
			if err != nil {
				t.Fatal(err)
			}
			p := panel{modes: modes, aspect: aspect}
			for i := range 400 {
				if p.complexPair(lambda*(1-1e-6)*float64(i+1)/400) >= 0 {
					t.Fatalf("N %d a/b %g: complex Ω² below λ = %g", modes, aspect, lambda)
				}
			}
			if p.complexPair(lambda*(1+1e-6)) < 0 {
				t.Errorf("N %d a/b %g: no flutter above λ = %g", modes, aspect, lambda)
			}
			lo, hi := math.Sqrt(p.bending(1)), math.Sqrt(p.bending(3))
			if omega < lo || omega > hi {
				t.Errorf("N %d a/b %g: Ω %g not between %g and %g", modes, aspect, omega, lo, hi)
			}
			rows++
		}
	}
	if rows != 25 {
		t.Errorf("ran %d rows", rows)
	}
	two, _, _ := PanelFlutter(2, 0.7)
	p := panel{modes: 2, aspect: 0.7}
	if math.Abs(two/p.twoModes()-1) > 1e-10 {
		t.Errorf("two modes: %g, closed form %g", two, p.twoModes())
	}
	tally(t, "PanelFlutter", "first meeting of two frequencies", rows)
}

// The exact pinned panel, e^{sξ} with s⁴ + λs − Ω² = 0: its determinant has a
// double zero in Ω² at λ = 343.356.
func TestPanelFlutterExact(t *testing.T) {
	det := func(lambda, square float64) float64 {
		s := quarticRoots(0, 0, complex(lambda, 0), complex(-square, 0))
		var e [4]complex128
		for i := range s {
			e[i] = cmplx.Exp(s[i] / 2)
		}
		pair := func(i, j, m, n int) complex128 {
			return (s[j]*s[j] - s[i]*s[i]) * (s[n]*s[n] - s[m]*s[m]) * (e[i]*e[j]/(e[m]*e[n]) + e[m]*e[n]/(e[i]*e[j]))
		}
		sum := pair(0, 1, 2, 3) - pair(0, 2, 1, 3) + pair(0, 3, 1, 2)
		v := complex(1, 0)
		for i := range s {
			for j := i + 1; j < 4; j++ {
				v *= s[j] - s[i]
			}
		}
		return real(sum / v)
	}
	// Below the critical λ the determinant changes sign twice, above never.
	changes := func(lambda float64) int {
		n, last := 0, det(lambda, 900)
		for q := 900.0; q < 1250; q += 0.5 {
			d := det(lambda, q)
			if (d > 0) != (last > 0) {
				n++
			}
			last = d
		}
		return n
	}
	lambda, _, err := PanelFlutter(20, 0)
	if err != nil {
		t.Fatal(err)
	}
	if below, above := changes(lambda-0.1), changes(lambda+0.1); below != 2 || above != 0 {
		t.Errorf("sign changes %d below and %d above λ = %g, want 2 and 0", below, above, lambda)
	}
	tally(t, "PanelFlutter", "double zero of the boundary determinant", 1)
}

func TestPanelRanges(t *testing.T) {
	_, _, err := PanelFlutter(1, 0)
	wantRangeError(t, err)
	_, _, err = PanelFlutter(10, 4)
	wantRangeError(t, err)
	_, err = PanelDivergence(3, 0)
	wantRangeError(t, err)
	_, err = PanelDivergence(1, 1)
	wantRangeError(t, err)
	_, err = flowEntryNamed(t, "PanelFlutter").Evaluate([]float64{2.5})
	wantRangeError(t, err)
}

// The flag's speed is where the two waves of the dispersion relation
// (m + m_a)ω² − 2m_a Ukω + m_a U²k² − Bk⁴ = 0 become complex.
func TestFlagCriticalDispersion(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		ratio := math.Pow(10, rapid.Float64Range(-3, 3).Draw(t, "log ρL/m"))
		aspect := math.Pow(10, rapid.Float64Range(-2, 3).Draw(t, "log H/L"))
		u, err := FlagCritical(ratio, aspect)
		if err != nil {
			t.Fatal(err)
		}
		const k = flagWaveNumber
		ma := 2 * ratio / k / (1 + 8/(math.Pi*k*aspect)) // over m
		discriminant := func(u float64) float64 {
			return ma*ma*u*u*k*k - (1+ma)*(ma*u*u*k*k-k*k*k*k)
		}
		if discriminant(0.999*u) < 0 || discriminant(1.001*u) > 0 {
			t.Fatalf("ρL/m %g H/L %g: u %g", ratio, aspect, u)
		}
	})
	// Wide: u² = k²(1 + k/(2ρL/m)); slender: m_a = πρH/4.
	wide, _ := FlagCritical(0.5, 1e9)
	if want := flagWaveNumber * math.Sqrt(1+flagWaveNumber); math.Abs(wide/want-1) > 1e-8 {
		t.Errorf("wide: %g, want %g", wide, want)
	}
	slender, _ := FlagCritical(0.5, 1e-3)
	if want := flagWaveNumber * math.Sqrt(1+4/(math.Pi*0.5*1e-3)); math.Abs(slender/want-1) > 2e-3 {
		t.Errorf("slender: %g, want %g", slender, want)
	}
	_, err := FlagCritical(0, 1)
	wantRangeError(t, err)
	_, err = FlagCritical(1, 0)
	wantRangeError(t, err)
	tally(t, "FlagCritical", "the waves of the dispersion relation meet", 1)
}

func TestGalloping(t *testing.T) {
	// At the onset the negative damping of the wind, ½ρUb a_G/(4πmn), is ζ.
	rapid.Check(t, func(t *rapid.T) {
		sc := rapid.Float64Range(0.1, 100).Draw(t, "Sc")
		aG := rapid.Float64Range(0.1, 10).Draw(t, "a_G")
		v, err := GallopingSpeed(sc, aG)
		if err != nil {
			t.Fatal(err)
		}
		zeta := sc / (4 * math.Pi) // m = ρb² = n = 1
		if wind := 0.5 * v * aG / (4 * math.Pi); math.Abs(wind/zeta-1) > 1e-12 {
			t.Fatalf("ζ of the wind %g, of the structure %g", wind, zeta)
		}
	})
	for _, aG := range []float64{0, -2} {
		if v, err := GallopingSpeed(10, aG); !math.IsInf(v, 1) || err != nil {
			t.Errorf("a_G %g: %g, %v", aG, v, err)
		}
	}
	if aG, listed, err := GallopingFactor(SectionCircle, math.NaN()); aG != 0 || !listed || err != nil {
		t.Errorf("circle: %g %t %v", aG, listed, err)
	}
	for _, shape := range []SectionShape{SectionI, SectionH, SectionChannel, SectionTee, SectionBluff} {
		if aG, listed, err := GallopingFactor(shape, 1); aG != 10 || listed || err != nil {
			t.Errorf("%s: %g %t %v", shape, aG, listed, err)
		}
	}
	if aG, listed, _ := GallopingFactor(SectionRectangle, 2.5); aG != 10 || listed {
		t.Errorf("rectangle beyond the table: %g %t", aG, listed)
	}
	_, _, err := GallopingFactor("star", 1)
	wantRangeError(t, err)
	_, _, err = GallopingFactor(SectionRectangle, 0)
	wantRangeError(t, err)
	_, err = GallopingSpeed(-1, 1)
	wantRangeError(t, err)
	_, err = GallopingSpeed(1, math.NaN())
	wantRangeError(t, err)
	tally(t, "GallopingSpeed", "damping of the wind", 1)
	tally(t, "GallopingSpeed", "no negative slope: no galloping", 2)
	tally(t, "GallopingFactor", "table of sections", 8)
	tally(t, "GallopingFactor", "none for a circle, by symmetry", 1)
}

func TestTubeArray(t *testing.T) {
	rows := 0
	for _, k := range []float64{TubeArrayDesignK, TubeArrayASMELowerK, TubeArrayASMEMeanK, TubeArraySingleRowK} {
		if v, err := TubeArrayCritical(4, k); err != nil || math.Abs(v-2*k) > 1e-12 {
			t.Errorf("K %g: %g, %v", k, v, err)
		}
		rows++
	}
	if rows != 4 {
		t.Errorf("ran %d criteria", rows)
	}
	_, err := TubeArrayCritical(0, 3)
	wantRangeError(t, err)
	_, err = TubeArrayCritical(1, 30)
	wantRangeError(t, err)
	tally(t, "TubeArrayCritical", "published constants", rows)
}

func BenchmarkPanelFlutter(b *testing.B) {
	for b.Loop() {
		flowSink, _, _ = PanelFlutter(10, 0)
	}
}

func BenchmarkPanelFlutter20(b *testing.B) {
	for b.Loop() {
		flowSink, _, _ = PanelFlutter(20, 0)
	}
}
