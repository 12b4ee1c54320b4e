package kind

import (
	"math"
	"testing"

	"regimed/regime/canon"
)

func agrees(t *testing.T, what string, got, want, tol float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tol*math.Abs(want)) {
		t.Errorf("%s = %.10g, want %.10g within %g", what, got, want, tol)
	}
}

// The forms without dimension agree with the canonical ones in SI.
func TestWaveSpeedsAgreeWithTheCanonicalOnes(t *testing.T) {
	ran := 0
	for _, c := range []struct{ bulk, rho, d, e, young float64 }{
		{2.2e9, 998, 0.5, 0.01, 2e11}, {2.2e9, 998, 0.3, 0.012, 3e9}, {1.4e5, 1.2, 0.1, 0.003, 2e11}, {2.2e9, 1000, 0.013, 0.0025, 5e6},
	} {
		a, err := canon.WaveSpeed(c.bulk, c.rho, c.d, c.e, c.young, 1)
		if err != nil {
			t.Fatal(err)
		}
		agrees(t, "a", math.Sqrt(c.bulk/c.rho)*waveSpeedRatio(c.bulk*c.d/(c.young*c.e)), a, 1e-12)
		m, err := canon.MoensKorteweg(c.young, c.e, c.rho, c.d/2)
		if err != nil {
			t.Fatal(err)
		}
		agrees(t, "c", pulseWaveSpeed(c.young, c.e, c.rho, c.d/2), m, 1e-12)
		ran++
	}
	if ran != 4 {
		t.Errorf("ran %d", ran)
	}
}

// besselI sums the power series of Iₙ.
func besselI(n int, x float64) float64 {
	term := math.Pow(x/2, float64(n))
	for k := 2; k <= n; k++ {
		term /= float64(k)
	}
	sum := 0.0
	for k := 1; k < 300; k++ {
		sum += term
		term *= x * x / 4 / float64(k) / float64(k+n)
	}
	return sum
}

func TestTubeAddedMass(t *testing.T) {
	ran := 0
	for _, x := range []float64{1e-3, 0.05, math.Pi / 10, 1, 3.5, 12, 40} {
		agrees(t, "I₀/(x I₁)", tubeAddedMass(x), besselI(0, x)/(x*besselI(1, x)), 1e-12)
		ran++
	}
	agrees(t, "long wave 2/x²", tubeAddedMass(1e-4)*1e-8/2, 1, 1e-8)
	agrees(t, "short wave 1/x", tubeAddedMass(500)*500, 1, 2e-3)
	agrees(t, "check value", tubeAddedMass(0.314159265358979), 20.5132, 1e-5)
	// a plane channel, ρ/(k tanh kR), has half of it for long waves
	x := 0.01
	agrees(t, "twice the channel", tubeAddedMass(x)*x*math.Tanh(x), 2, 1e-4)
	if ran != 7 {
		t.Errorf("ran %d", ran)
	}
}

// The fluid in a tube that moves across its axis: ∂φ/∂r at the wall is the speed,
// and the force is the pressure over the wall. Solved here by finite differences
// of φ″ + φ′/r + (k² − 1/r²)φ = 0 on 0 … 1.
func TestSidewaysMassAgainstFiniteDifferences(t *testing.T) {
	ran := 0
	for _, ka := range []float64{0.1, 0.5, 1, 1.5} {
		const n = 20000
		h := 1.0 / n
		// shoot from φ ≈ r at the axis, Störmer's rule in φ = √r-free form by Runge–Kutta
		r, phi, slope := 1e-6, 1e-6, 1.0
		f := func(r, phi, slope float64) float64 { return -slope/r - (ka*ka-1/(r*r))*phi }
		for r < 1-h/2 {
			step := math.Min(h, 1-r)
			if r < 50*h {
				step = math.Min(step, r/4)
			}
			k1, l1 := slope, f(r, phi, slope)
			k2, l2 := slope+step/2*l1, f(r+step/2, phi+step/2*k1, slope+step/2*l1)
			k3, l3 := slope+step/2*l2, f(r+step/2, phi+step/2*k2, slope+step/2*l2)
			k4, l4 := slope+step*l3, f(r+step, phi+step*k3, slope+step*l3)
			phi += step / 6 * (k1 + 2*k2 + 2*k3 + k4)
			slope += step / 6 * (l1 + 2*l2 + 2*l3 + l4)
			r += step
		}
		agrees(t, "Γ", sideways(ka), phi/slope, 1e-3)
		ran++
	}
	agrees(t, "still", sideways(0), 1, 1e-12)
	agrees(t, "check value", sideways(0.1), 1.002507, 1e-6)
	if sideways(5) != sideways(1.8) || sideways(1.8) < 5 {
		t.Error("beyond the first cross mode the value near it stands")
	}
	if ran != 4 {
		t.Errorf("ran %d", ran)
	}
}

// von Mises' pressure tends to that of a long tube, rises as the tube gets
// shorter, and takes more lobes then.
func TestLobePressure(t *testing.T) {
	p, n := lobePressure(1, 0, 0.1, 1, math.NaN())
	agrees(t, "long tube", p, 2.5e-4, 1e-12)
	if n != 2 {
		t.Errorf("a long tube buckles into %d lobes", n)
	}
	p, _ = lobePressure(2e11, 0.3, 0.01, 1, math.NaN())
	agrees(t, "E h³/(4(1 − ν²)R³)", p, 2e11*1e-6/(4*0.91), 1e-12)
	last, lobes := math.Inf(1), 99
	for _, l := range []float64{0.5, 1, 2, 5, 20, 200} {
		p, n := lobePressure(2e11, 0.3, 0.01, 1, l)
		if p > last || n > lobes {
			t.Errorf("at ℓ/R %g the pressure %g and %d lobes do not fall", l, p, n)
		}
		last, lobes = p, n
	}
	// the short-tube formula of Southwell and Windenburg & Trilling,
	// 2.42 E (h/D)^2.5/((1 − ν²)^0.75 (ℓ/D − 0.45√(h/D))), within a tenth (from memory)
	p, _ = lobePressure(2e11, 0.3, 0.01, 1, 2)
	windenburg := 2.42 * 2e11 * math.Pow(0.005, 2.5) / math.Pow(0.91, 0.75) / (1 - 0.45*math.Sqrt(0.005))
	agrees(t, "short tube", p, windenburg, 0.1)
}

// Moody's chart (from memory): smooth 0.0180 at 1e5 and 0.0116 at 1e6; k/D 1e-3:
// 0.0222 at 1e5; laminar 64/Re.
func TestFrictionFactor(t *testing.T) {
	rows := []struct{ re, k, f float64 }{{1000, 0, 0.064}, {1e5, 0, 0.0180}, {1e6, 0, 0.0116}, {1e5, 1e-3, 0.0222}, {1e7, 1e-3, 0.0197}}
	for _, r := range rows {
		agrees(t, "f", frictionFactor(r.re, r.k), r.f, 0.02)
	}
	if len(rows) != 5 {
		t.Error("rows are missing")
	}
}

// integrals of the first mode of a cantilever by quadrature
func TestCantileverIntegrals(t *testing.T) {
	const n = 4000
	h := 1.0 / n
	shape := func(x float64) float64 {
		w, err := canon.BeamShape(canon.ClampedFree, 1, math.Min(math.Max(x, 0), 1))
		if err != nil {
			t.Fatal(err)
		}
		return w
	}
	var mass, weight, follower float64
	for i := 1; i < n; i++ {
		x := float64(i) * h
		w, up, down := shape(x), shape(x+h), shape(x-h)
		slope, curve := (up-down)/(2*h), (up-2*w+down)/(h*h)
		mass += w * w
		weight += (1 - x) * slope * slope
		follower += w * curve
	}
	w1 := shape(1)
	mass += w1 * w1 / 2
	p := &pipe{support: canon.ClampedFree, n: 1}
	agrees(t, "∫(1 − ξ)φ′²", weight/mass, p.hangingMode(), 1e-3)
	factors, err := canon.BeamModeFactors(canon.ClampedFree, 1)
	if err != nil {
		t.Fatal(err)
	}
	x := math.Sqrt(1+factors.MeanSquareSlope/factors.MeanSquare) - 1
	agrees(t, "∫φφ″", x*(2-x), follower/mass, 1e-3)
	agrees(t, "∫φφ″ by Gregory & Païdoussis", x*(2-x), 0.8582, 1e-3)
}

// The onset with a loss factor is that of the viscoelastic pipe whose loss at the
// frequency of the onset is the same; without loss it is the canonical one; and
// what the canonical solution refuses is taken at the end of its range.
func TestOnsets(t *testing.T) {
	u, state := onsetOf(0.2, 0, 0, canon.PipeCantilever)
	agrees(t, "β 0.2", u, 5.59140437783, 1e-8)
	if state != found {
		t.Errorf("state %d", state)
	}
	const loss = 0.1
	u, _ = onsetOf(0.5, 0, loss, canon.PipeCantilever)
	_, omega, err := canon.ConveyingPipe(0.5, 0, 0.004, canon.PipeCantilever)
	for range 30 {
		if err != nil {
			t.Fatal(err)
		}
		_, omega, err = canon.ConveyingPipe(0.5, 0, loss/omega, canon.PipeCantilever)
	}
	exact, _, err := canon.ConveyingPipe(0.5, 0, loss/omega, canon.PipeCantilever)
	if err != nil {
		t.Fatal(err)
	}
	agrees(t, "with loss", u, exact, 2e-3)
	rows := []struct {
		beta, gamma float64
		support     canon.PipeSupport
		state       onsetState
	}{
		{0.2, 1000, canon.PipeCantilever, beyondWeight}, {0.99, 0, canon.PipeCantilever, beyondShare},
		{0.2, -20, canon.PipeCantilever, fellUnderWeight}, {0.2, -20, canon.PipePinnedPinned, fellUnderWeight},
		{1e-9, 0, canon.PipeCantilever, found}, {0.99, 0, canon.PipeClampedClamped, found}, {0.3, 500, canon.PipePinnedPinned, beyondWeight},
		{0.95, 100, canon.PipeCantilever, beyondSpeed},
	}
	ran := 0
	for _, r := range rows {
		u, state := onsetOf(r.beta, r.gamma, 0, r.support)
		if state != r.state && !(r.state == beyondSpeed && state == found) {
			t.Errorf("β %g, γ %g, %s: state %d, want %d", r.beta, r.gamma, r.support, state, r.state)
		}
		if math.IsNaN(u) || u < 0 || state != fellUnderWeight && u < 3 {
			t.Errorf("β %g, γ %g: u = %g", r.beta, r.gamma, u)
		}
		ran++
	}
	if ran != 8 {
		t.Errorf("ran %d", ran)
	}
}
