package canon

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// Values computed independently to 30 digits.
func TestSurfaceCheckValues(t *testing.T) {
	const tol = 1e-10
	runFlowChecks(t, 9, []flowCheck{
		{"CylinderDiffraction", []float64{0.01}, []float64{2.00042217196}, tol},
		{"CylinderDiffraction", []float64{0.1}, []float64{2.01918058626}, tol},
		{"CylinderDiffraction", []float64{0.5}, []float64{2.00563209578}, tol},
		{"CylinderDiffraction", []float64{1}, []float64{1.3716158315}, tol},
		{"CylinderDiffraction", []float64{1.5}, []float64{0.842042133285}, tol},
		{"CylinderDiffraction", []float64{3}, []float64{0.30773350353}, tol},
		{"CylinderDiffraction", []float64{10}, []float64{0.0504918489343}, tol},
		{"WaveSpeed", []float64{2.2e9, 998, 0.5, 0.01, 2e11}, []float64{1192.55995119}, tol},
		{"WaveSpeed", []float64{2.2e9, 998, 0.3, 0.012, 3e9}, []float64{337.670173009}, tol},
	})
	fractions := []struct{ depth, rectangular, upright float64 }{
		{0.2, 0.718426546524, 0.800955261235}, {0.4, 0.548362728416, 0.712454253354},
		{0.8, 0.3183106161, 0.511401284977}, {1.5, 0.171980423929, 0.30059673534}, {3, 0.0860040907017, 0.151498224618},
	}
	rows := 0
	for _, c := range fractions {
		_, r, err1 := RectangularTank(1, c.depth)
		_, u, err2 := UprightTank(1, c.depth)
		if err1 != nil || err2 != nil || math.Abs(r/c.rectangular-1) > tol || math.Abs(u/c.upright-1) > tol {
			t.Errorf("h %g: %.12g %.12g, want %.12g %.12g", c.depth, r, u, c.rectangular, c.upright)
		}
		rows++
	}
	if rows != 5 {
		t.Errorf("ran %d rows", rows)
	}
}

func TestSurfaceDocumentedValues(t *testing.T) {
	runFlowChecks(t, 7, []flowCheck{
		{"JoukowskySurge", []float64{998, 1200, 1}, []float64{1.1976e6}, 1e-12},
		{"MoensKorteweg", []float64{4e5, 1e-3, 1060, 0.01}, []float64{4.34372}, 1e-5},
		{"PulseWave", []float64{1, 0}, []float64{1, 1}, 1e-12},
		{"PulseWave", []float64{0, 1}, []float64{math.Sqrt2, 0.00186744}, 1e-5},
		{"Electromechanical", []float64{0.25}, []float64{1.11803398875, 0.0559016994375}, 1e-10},
		{"GeneralisedCoupling", []float64{0.2}, []float64{0.25}, 1e-12},
		{"PipeConstraint", []float64{2, 10, 0.3}, []float64{1.16909}, 1e-5},
	})
	tally(t, "MoensKorteweg", "artery by hand", 1)
	tally(t, "PulseWave", "no inertia: e^−2π, by hand", 2)
	tally(t, "Electromechanical", "K² = ¼ by hand", 2)
	tally(t, "GeneralisedCoupling", "k² = 0.2 by hand", 1)
}

// Frequencies of two tanks, g 9.80665.
func TestTankFrequencies(t *testing.T) {
	const g = 9.80665
	f, _, err := RectangularTank(1, 0.5)
	if err != nil || math.Abs(f*math.Sqrt(g)/(2*math.Pi)-0.8460) > 1e-4 {
		t.Errorf("1 m by 0.5 m: %g Hz, %v", f*math.Sqrt(g)/(2*math.Pi), err)
	}
	f, _, err = UprightTank(1, 2)
	if err != nil || math.Abs(f*math.Sqrt(g)/(2*math.Pi)-0.6759) > 1e-4 {
		t.Errorf("R 1 m, h 2 m: %g Hz, %v", f*math.Sqrt(g)/(2*math.Pi), err)
	}
	if r := uprightTankRoot(1); math.Abs(r-1.8411837813406593) > 1e-14 {
		t.Errorf("ε₁ = %.16g", r)
	}
	// Further zeros of J₁′ (any table): 5.331443, 8.536316, 11.706005.
	rows := 0
	for i, want := range []float64{5.331443, 8.536316, 11.706005} {
		if got := uprightTankRoot(i + 2); math.Abs(got-want) > 1e-6 {
			t.Errorf("ε_%d = %g, want %g", i+2, got, want)
		}
		rows++
	}
	if rows != 3 {
		t.Errorf("ran %d roots", rows)
	}
	tally(t, "RectangularTank", "frequency of a tank of 1 m", 1)
	tally(t, "UprightTank", "frequency of a tank of 1 m, zeros of J₁′", 5)
}

// In a shallow tank all of the liquid sloshes: Σ8/(n³π³)·nπ = 1 over odd n, and
// Σ2/(ε_n² − 1) = 1; deeper, a share remains that moves with the tank.
func TestTankMassShares(t *testing.T) {
	var rectangular, upright float64
	for n := 1; n <= tankMaxMode; n++ {
		_, r, err1 := RectangularTank(n, 1e-4)
		_, u, err2 := UprightTank(n, 1e-4)
		if err1 != nil || err2 != nil {
			t.Fatal(err1, err2)
		}
		if n%2 == 0 && r != 0 {
			t.Errorf("even mode %d moves %g", n, r)
		}
		rectangular += r
		upright += u
	}
	// The tails: 4/(π²·50) and 2/(π²·50).
	if math.Abs(rectangular+4/(math.Pi*math.Pi*50)-1) > 1e-4 || math.Abs(upright+2/(math.Pi*math.Pi*50)-1) > 1e-3 {
		t.Errorf("shares of a shallow tank: %g and %g", rectangular, upright)
	}
	// Housner's 0.230(D/H)tanh(3.67H/D) (API 650, from memory) lies within 2 %.
	rows := 0
	for _, h := range []float64{0.2, 0.5, 1, 2, 4} {
		_, m, _ := UprightTank(1, h)
		if housner := 0.230 * 2 / h * math.Tanh(3.67*h/2); math.Abs(m/housner-1) > 0.02 {
			t.Errorf("h/R %g: %g, Housner %g", h, m, housner)
		}
		rows++
	}
	if rows != 5 {
		t.Errorf("ran %d depths", rows)
	}
	_, _, err := RectangularTank(0, 1)
	wantRangeError(t, err)
	_, _, err = UprightTank(1, 0)
	wantRangeError(t, err)
	_, err = flowEntryNamed(t, "UprightTank").Evaluate([]float64{1.5, 1})
	wantRangeError(t, err)
	tally(t, "RectangularTank", "the shares of a shallow tank make the whole", 1)
	tally(t, "UprightTank", "the shares of a shallow tank make the whole", 1)
	tally(t, "UprightTank", "Housner's formula", rows)
}

func TestCylinderDiffractionLimits(t *testing.T) {
	c, lag, err := CylinderDiffraction(0)
	if c != 2 || lag != 0 || err != nil {
		t.Errorf("ka 0: %g %g %v", c, lag, err)
	}
	small, _, _ := CylinderDiffraction(1e-50)
	if math.Abs(small-2) > 1e-12 {
		t.Errorf("ka → 0: %g", small)
	}
	large, lag, _ := CylinderDiffraction(1e4)
	if math.Abs(large/(4/math.Sqrt(2*math.Pi)*1e-6)-1) > 1e-4 || math.Abs(lag-(0.75*math.Pi-1e4)) > 1e-3 {
		t.Errorf("ka 1e4: %g, lag %g", large, lag)
	}
	// The lag is one continuous curve, and its slope follows from the Wronskian:
	// dα/dx = −2(1 − 1/x²)/(πx(J₁′² + Y₁′²)).
	prev, rows := 0.0, 0
	for x := 0.01; x < 60; x += 0.01 {
		_, a, err := CylinderDiffraction(x)
		if err != nil || math.Abs(a-prev) > 0.011 {
			t.Fatalf("ka %g: lag %g after %g, %v", x, a, prev, err)
		}
		prev = a
		rows++
	}
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64Range(0.1, 50).Draw(t, "ka")
		const h = 1e-5
		c, _, _ := CylinderDiffraction(x)
		_, up, _ := CylinderDiffraction(x + h)
		_, down, _ := CylinderDiffraction(x - h)
		modulus2 := math.Pow(4/(math.Pi*x*x*c), 2)
		want := -2 * (1 - 1/(x*x)) / (math.Pi * x * modulus2)
		if got := (up - down) / (2 * h); math.Abs(got-want) > 1e-6 {
			t.Fatalf("ka %g: slope of the lag %g, want %g", x, got, want)
		}
	})
	if rows < 5990 {
		t.Errorf("scanned %d", rows)
	}
	_, _, err = CylinderDiffraction(-1)
	wantRangeError(t, err)
	tally(t, "CylinderDiffraction", "slope of the lag by the Wronskian", 1)
}

// A wall of any thickness: 2·(radial strain at the bore per p/E) of Lamé's
// cylinder, (b² + a²)/(b² − a²) + ν, is c₁D/e with expansion joints.
func TestPipeConstraintIsLame(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		nu := rapid.Float64Range(0, 0.5).Draw(t, "ν")
		slenderness := math.Pow(10, rapid.Float64Range(-0.5, 4).Draw(t, "log D/e"))
		c, err := PipeConstraint(ExpansionJoints, nu, slenderness)
		if err != nil {
			t.Fatal(err)
		}
		a, b := slenderness/2, slenderness/2+1
		if lame := 2 * ((b*b+a*a)/(b*b-a*a) + nu); math.Abs(c*slenderness/lame-1) > 1e-10 {
			t.Fatalf("D/e %g: %g, Lamé %g", slenderness, c*slenderness, lame)
		}
	})
	thin := map[PipeAnchoring]float64{AnchoredUpstream: 0.85, AnchoredThroughout: 0.91, ExpansionJoints: 1}
	rows := 0
	for anchoring, want := range thin {
		if c, err := PipeConstraint(anchoring, 0.3, 1e9); err != nil || math.Abs(c-want) > 1e-8 {
			t.Errorf("%s: %g, %v", anchoring, c, err)
		}
		rows++
	}
	if rows != 3 {
		t.Errorf("ran %d anchorings", rows)
	}
	_, err := PipeConstraint("glued", 0.3, 10)
	wantRangeError(t, err)
	_, err = PipeConstraint(ExpansionJoints, 0.6, 10)
	wantRangeError(t, err)
	_, err = PipeConstraint(ExpansionJoints, 0.3, 0)
	wantRangeError(t, err)
	tally(t, "PipeConstraint", "published thin walls", rows)
	tally(t, "PipeConstraint", "elastic cylinder of any wall", 1)
}

func TestPressureWaveLimits(t *testing.T) {
	// Stiff wall: sound; soft wall: Moens–Korteweg.
	stiff, err := WaveSpeed(2.2e9, 998, 0.1, 0.1, 1e13, 1)
	if err != nil || math.Abs(stiff/math.Sqrt(2.2e9/998)-1) > 2e-4 {
		t.Errorf("stiff wall: %g, %v", stiff, err)
	}
	soft, _ := WaveSpeed(2.2e9, 1060, 0.02, 1e-3, 4e5, 1)
	pulse, err := MoensKorteweg(4e5, 1e-3, 1060, 0.01)
	if err != nil || math.Abs(soft/pulse-1) > 1e-4 {
		t.Errorf("soft wall: %g, Moens–Korteweg %g, %v", soft, pulse, err)
	}
	sudden, _ := JoukowskySurge(1000, 1000, 2, 0.9)
	slow, _ := JoukowskySurge(1000, 1000, 2, 10)
	if sudden != 2e6 || slow != 2e5 {
		t.Errorf("surge %g and %g", sudden, slow)
	}
	// High Womersley number: little attenuation, k ≈ 1 + F₁₀/2.
	speed, decay, err := PulseWave(0.97643, 0.02329)
	if err != nil || math.Abs(speed-0.988) > 0.002 || decay < 0.9 || decay > 0.95 {
		t.Errorf("large α: %g %g %v", speed, decay, err)
	}
	_, err = WaveSpeed(0, 1, 1, 1, 1e9, 1)
	wantRangeError(t, err)
	_, err = WaveSpeed(1e9, 1e3, 1, 1, 1e9, 0)
	wantRangeError(t, err)
	_, err = MoensKorteweg(1e5, 0, 1e3, 1)
	wantRangeError(t, err)
	_, err = JoukowskySurge(1e3, 1e3, -1, 0)
	wantRangeError(t, err)
	_, _, err = PulseWave(0, 0)
	wantRangeError(t, err)
	_, _, err = PulseWave(2, 0)
	wantRangeError(t, err)
	_, _, err = PulseWave(0, 2)
	wantRangeError(t, err)
	tally(t, "MoensKorteweg", "the wave speed of a soft wall", 1)
}

// The matched load gives the greatest loss factor of all loads.
func TestElectromechanical(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		K2 := rapid.Float64Range(1e-4, 5).Draw(t, "K²")
		ratio, damping, load, err := Electromechanical(K2)
		if err != nil {
			t.Fatal(err)
		}
		loss := func(x float64) float64 {
			k := 1 + complex(K2, 0)*complex(0, x)/complex(1, x)
			return imag(k) / real(k)
		}
		if math.Abs(loss(load)/2-damping) > 1e-12 {
			t.Fatalf("K² %g: ζ %g, loss factor %g", K2, damping, loss(load))
		}
		if loss(load*1.01) >= loss(load) || loss(load/1.01) >= loss(load) {
			t.Fatalf("K² %g: load %g is not the best", K2, load)
		}
		if open := 1 + K2; math.Abs(ratio*ratio-open) > 1e-12*open {
			t.Fatalf("K² %g: ratio %g", K2, ratio)
		}
	})
	_, small, _, _ := Electromechanical(1e-6)
	if math.Abs(small/(1e-6/4)-1) > 1e-6 {
		t.Errorf("small K²: ζ %g", small)
	}
	// k² and K²: open to short circuit is 1/√(1 − k²).
	K2, err := GeneralisedCoupling(0.36)
	ratio, _, _, _ := Electromechanical(K2)
	if err != nil || math.Abs(ratio-1/math.Sqrt(1-0.36)) > 1e-12 {
		t.Errorf("k² 0.36: %g, %v", ratio, err)
	}
	_, err = GeneralisedCoupling(1)
	wantRangeError(t, err)
	_, _, _, err = Electromechanical(-1)
	wantRangeError(t, err)
	tally(t, "Electromechanical", "greatest loss factor of all loads", 1)
	tally(t, "GeneralisedCoupling", "frequency ratio 1/√(1 − k²)", 1)
}

func BenchmarkCylinderDiffraction(b *testing.B) {
	for b.Loop() {
		flowSink, _, _ = CylinderDiffraction(0.7)
	}
}

func BenchmarkUprightTank(b *testing.B) {
	for b.Loop() {
		flowSink, _, _ = UprightTank(1, 0.7)
	}
}
