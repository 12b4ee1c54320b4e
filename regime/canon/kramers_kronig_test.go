package canon

import (
	"math"
	"testing"
)

// hilbert is (2/π) P∫₀^∞ v g(v)/(v² − x²) dv. P∫ dv/(v² − x²) vanishes, so that
// x g(x) may be taken off the numerator, which leaves no pole; v = x e^t spreads
// all decades evenly, as far as the arguments go.
func hilbert(g func(float64) float64, x, farthest float64) float64 {
	here := x * g(x)
	top := math.Log(farthest / x)
	integrand := func(t float64) float64 {
		// (v g(v) − x g(x)) v/(v² − x²), of which t = 0 is never a node.
		v := x * math.Exp(t)
		return (v*g(v) - here) * v / ((v - x) * (v + x))
	}
	return 2 / math.Pi * (stillFluidIntegral(integrand, -40, 0, 80) + stillFluidIntegral(integrand, 0, top, int(2*top)))
}

// Kramers–Kronig: no effect comes before its cause. For e^{+iωt} a response f that
// vanishes at high frequency is analytic in the lower half plane, so that its real
// part follows from its imaginary part, Re f(x) = −(2/π) P∫ v Im f(v)/(v² − x²) dv.
func TestKramersKronig(t *testing.T) {
	must := func(a, b float64, err error) (float64, float64) {
		t.Helper()
		if err != nil {
			t.Fatal(err)
		}
		return a, b
	}
	rows := []struct {
		entry string
		// f less its value at high frequency.
		f         func(x float64) (re, im float64)
		at        []float64
		farthest  float64 // where the integral ends
		tolerance float64 // what is left beyond
	}{
		{"Theodorsen", func(k float64) (float64, float64) {
			re, im := must(Theodorsen(k))
			return re - 0.5, im
		}, []float64{0.01, 0.1, 0.4, 1, 5}, 1e8, 1e-8},
		// The velocity behind the pressure gradient, over frequency: x = α².
		{"PulsatileTube", func(x float64) (float64, float64) {
			re, im := must(PulsatileTube(math.Sqrt(x)))
			return re - 1, im
		}, []float64{0.1, 3, 30, 400}, 1e16, 3e-8},
		{"ThinFilm", func(x float64) (float64, float64) {
			re, im := must(ThinFilm(x, 0.5))
			return re - 1, im
		}, []float64{0.1, 10, 300, 1e5}, 1e12, 1e-5},
		{"SoundSphere", func(x float64) (float64, float64) {
			re, im := must(SoundSphere(x))
			return re, -im
		}, []float64{0.1, 1, 3, 20}, 1e10, 1e-9},
		{"SoundCylinder", func(x float64) (float64, float64) {
			re, im := must(SoundCylinder(x))
			return re, -im
		}, []float64{0.1, 1, 3, 10}, 1e10, 1e-9},
	}
	for _, row := range rows {
		im := func(x float64) float64 { _, im := row.f(x); return im }
		for _, x := range row.at {
			want, _ := row.f(x)
			if got := -hilbert(im, x, row.farthest); math.Abs(got-want) > row.tolerance {
				t.Errorf("%s at %g: real part %.12g, from the imaginary part %.12g", row.entry, x, want, got)
			}
		}
		tally(t, row.entry, "Kramers–Kronig", len(row.at))
	}
	if len(rows) != 5 {
		t.Errorf("ran %d rows, want 5", len(rows))
	}
}
