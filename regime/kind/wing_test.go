package kind

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// The lift slope lies between those of a slender and of an infinite wing. An
// elliptic wing of aspect ratio 6 has 2π/(1 + 2/6) = 4.71 by lifting line, which
// is a little high.
func TestLiftSlope(t *testing.T) {
	near(t, "lift slope at A 6", liftSlopeOf(6, 0), 4.5286, 1e-4)
	near(t, "the same against the lifting line", liftSlopeOf(6, 0), 2*math.Pi*6/8, 0.05)
	near(t, "lift slope without tips, swept", liftSlopeOf(math.Inf(1), math.Pi/4), 2*math.Pi*math.Sqrt(0.5), 1e-12)
	near(t, "lift slope of a slender wing", liftSlopeOf(0.01, 0.5), math.Pi/2*0.01, 0.01)
	near(t, "lift slope towards no tips", liftSlopeOf(1e7, 0.6), liftSlopeOf(math.Inf(1), 0.6), 1e-6)
	rapid.Check(t, func(rt *rapid.T) {
		a, sweep := math.Exp(rapid.Float64Range(-5, 5).Draw(rt, "log A")), rapid.Float64Range(-1, 1).Draw(rt, "Λ")
		if x := liftSlopeOf(a, sweep); !(x > 0 && x < math.Min(math.Pi/2*a, 2*math.Pi*math.Cos(sweep))*(1+1e-12)) {
			rt.Errorf("lift slope %g at A %g, Λ %g", x, a, sweep)
		}
	})
}

// US Standard Atmosphere 1976, from memory: 216.65 K and 22632 Pa at 11 km, 5474.9
// Pa at 20 km.
func TestStandardAtmosphere(t *testing.T) {
	rows := []struct{ h, temperature, pressure float64 }{
		{0, 288.15, 101325}, {1000, 281.65, 89874.6}, {5000, 255.65, 54019.9}, {11000, 216.65, 22632.1}, {20000, 216.65, 5474.9},
	}
	for _, r := range rows {
		temperature, pressure := standardAtmosphere(r.h)
		near(t, "temperature", temperature, r.temperature, 1e-12)
		near(t, "pressure", pressure, r.pressure, 2e-5)
	}
	if len(rows) != 5 {
		t.Error("rows are missing")
	}
}

// The exact divergence of a uniform swept cantilever in strip theory: θ‴ + τθ′ + βθ = 0
// in y from root to tip, θ(0) = 0, θ′(1) = 0, θ″(1) + τθ(1) = 0 (θ the incidence by
// twist and bending). τ + linear in β of the wing is compared with the exact
// eigenvalue, found here by integration.
func TestSweptDivergenceIsNearlyLinear(t *testing.T) {
	ran := 0
	for _, beta := range []float64{-6.3298, -4, -2, 0, 2} {
		exact := sweptDivergence(beta)
		near(t, "τ_D", exact+1, math.Pi*math.Pi/4+3*math.Pi*math.Pi/76*beta+1, 0.02)
		ran++
	}
	near(t, "τ_D without bending", sweptDivergence(0), math.Pi*math.Pi/4, 1e-6)
	near(t, "bending alone: 1 + τ_D at β = −6.3298", 1+sweptDivergence(-6.3298), 1, 1e-3)
	if ran != 5 {
		t.Errorf("ran %d rows", ran)
	}
}

// sweptDivergence is the lowest τ at which the determinant of the conditions at
// the tip vanishes.
func sweptDivergence(beta float64) float64 {
	f := func(tau float64) float64 {
		a, b := shoot(tau, beta, 1, 0), shoot(tau, beta, 0, 1)
		return a[1]*(b[2]+tau*b[0]) - b[1]*(a[2]+tau*a[0])
	}
	lo := -1.0
	for lo < 10 && (f(lo) > 0) == (f(lo+0.05) > 0) {
		lo += 0.05
	}
	hi := lo + 0.05
	for range 60 {
		if mid := (lo + hi) / 2; (f(mid) > 0) == (f(lo) > 0) {
			lo = mid
		} else {
			hi = mid
		}
	}
	return lo
}

// shoot integrates θ‴ = −βθ − τθ′ from the root with θ = 0 and given θ′, θ″.
func shoot(tau, beta, first, second float64) [3]float64 {
	const steps = 400
	const h = 1.0 / steps
	slope := func(x [3]float64) [3]float64 { return [3]float64{x[1], x[2], -beta*x[0] - tau*x[1]} }
	step := func(x, k [3]float64, h float64) [3]float64 {
		return [3]float64{x[0] + h*k[0], x[1] + h*k[1], x[2] + h*k[2]}
	}
	x := [3]float64{0, first, second}
	for range steps {
		k1 := slope(x)
		k2 := slope(step(x, k1, h/2))
		k3 := slope(step(x, k2, h/2))
		k4 := slope(step(x, k3, h))
		for i := range x {
			x[i] += h / 6 * (k1[i] + 2*k2[i] + 2*k3[i] + k4[i])
		}
	}
	return x
}
