package fluid

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func near(got, want, tolerance float64) bool {
	return math.Abs(got-want) <= tolerance*math.Abs(want)
}

// IAPWS-IF97 Table 5, from memory of the release: 9 printed digits.
func TestRegion1AgainstTable5(t *testing.T) {
	rows := []struct{ T, p, v, h, s, cp, w float64 }{
		{300, 3e6, 0.100215168e-2, 0.115331273e6, 0.392294792e3, 0.417301218e4, 0.150773921e4},
		{300, 80e6, 0.971180894e-3, 0.184142828e6, 0.368563852e3, 0.401008987e4, 0.163469054e4},
		{500, 3e6, 0.120241800e-2, 0.975542239e6, 0.258041912e4, 0.465580682e4, 0.124071337e4},
	}
	ran := 0
	for _, r := range rows {
		got := waterRegion1(r.T, r.p)
		for _, c := range []struct {
			name      string
			got, want float64
		}{
			{"v", got.volume, r.v}, {"h", got.enthalpy, r.h}, {"s", got.entropy, r.s},
			{"c_p", got.isobaricHeat, r.cp}, {"w", got.soundSpeed, r.w},
		} {
			if !near(c.got, c.want, 5e-9) {
				t.Errorf("%s at %g K, %g Pa: %.10g, want %.9g", c.name, r.T, r.p, c.got, c.want)
			}
			ran++
		}
	}
	if ran != 15 {
		t.Errorf("ran %d values, want 15", ran)
	}
}

// IAPWS-IF97 Table 35, from memory of the release.
func TestSaturationAgainstTable35(t *testing.T) {
	rows := []struct{ T, p float64 }{{300, 0.353658941e4}, {500, 0.263889776e7}, {600, 0.123443146e8}}
	for _, r := range rows {
		if got := saturationPressureWater(r.T); !near(got, r.p, 5e-9) {
			t.Errorf("p_sat(%g K) = %.10g, want %.9g", r.T, got, r.p)
		}
	}
	if got := saturationPressureWater(criticalTemperatureWater); !near(got, 22.064e6, 1e-5) {
		t.Errorf("p_sat at the critical temperature %.8g, want the critical pressure", got)
	}
	if got := saturationPressureWater(lowestTemperature1); !near(got, lowestSaturationPressure, 1e-8) {
		t.Errorf("p_sat at 273.15 K %.10g, want %.10g", got, lowestSaturationPressure)
	}
}

// IAPWS R12-08 Table 4, without critical enhancement, from memory of the
// release: in µPa·s.
func TestViscosityAgainstTable4(t *testing.T) {
	rows := []struct{ T, ρ, μ float64 }{
		{298.15, 998, 889.735100}, {298.15, 1200, 1437.649467}, {373.15, 1000, 307.883622},
		{433.15, 1, 14.538324}, {433.15, 1000, 217.685358},
		{873.15, 1, 32.619287}, {873.15, 100, 35.802262}, {873.15, 600, 77.430195},
		{1173.15, 1, 44.217245}, {1173.15, 100, 47.640433}, {1173.15, 400, 64.154608},
	}
	for _, r := range rows {
		if got := viscosityWater(r.T, r.ρ) * 1e6; math.Abs(got-r.μ) > 0.6e-6 {
			t.Errorf("μ(%g K, %g kg/m³) = %.6f, want %.6f µPa·s", r.T, r.ρ, got, r.μ)
		}
	}
	if len(rows) != 11 {
		t.Errorf("ran %d rows, want 11", len(rows))
	}
}

// IAPWS R15-11 Table 4 at zero density, from memory of the release.
func TestDiluteConductivityAgainstTable4(t *testing.T) {
	rows := []struct{ T, λ float64 }{{298.15, 18.4341883e-3}, {873.15, 79.1034659e-3}}
	for _, r := range rows {
		if got := conductivityDiluteWater(r.T); !near(got, r.λ, 3e-9) {
			t.Errorf("λ₀(%g K) = %.10g, want %.10g", r.T, got, r.λ)
		}
	}
}

// The sum over powers by multiplication is the sum over math.Pow.
func TestGibbsSumAgainstPow(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		T, p := drawLiquid(t)
		π, τ := p/reducingPressure1, reducingTemperature1/T
		var want gibbs1
		for _, k := range gibbsTerms {
			i, j := float64(k.i), float64(k.j)
			pow := func(di, dj float64) float64 {
				return k.n * math.Pow(7.1-π, i-di) * math.Pow(τ-1.222, j-dj)
			}
			want.γ += pow(0, 0)
			want.γπ -= i * pow(1, 0)
			want.γππ += i * (i - 1) * pow(2, 0)
			want.γτ += j * pow(0, 1)
			want.γττ += j * (j - 1) * pow(0, 2)
			want.γπτ -= i * j * pow(1, 1)
		}
		got := gibbsRegion1(π, τ)
		for _, c := range [][2]float64{
			{got.γ, want.γ}, {got.γπ, want.γπ}, {got.γππ, want.γππ},
			{got.γτ, want.γτ}, {got.γττ, want.γττ}, {got.γπτ, want.γπτ},
		} {
			if math.Abs(c[0]-c[1]) > 1e-11*(math.Abs(c[1])+1e-3) {
				t.Fatalf("at %g K, %g Pa: %.15g, want %.15g", T, p, c[0], c[1])
			}
		}
	})
}

func drawLiquid(t *rapid.T) (T, p float64) {
	T = rapid.Float64Range(275, 620).Draw(t, "T")
	return T, rapid.Float64Range(saturationPressureWater(T)*1.01+2e5, 99e6).Draw(t, "p")
}

// The analytic properties are the derivatives that thermodynamics says they
// are: v = (∂g/∂p)_T, s = −(∂g/∂T)_p, c_p = (∂h/∂T)_p, the Maxwell relation
// (∂s/∂p)_T = −(∂v/∂T)_p, c_p − c_v = −T (∂v/∂T)²/(∂v/∂p), and
// w² = (∂p/∂ρ)_s followed along an isentrope by finite steps.
func TestRegion1Identities(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		T, p := drawLiquid(t)
		dT, dp := 1e-4*T, 1e4
		at := waterRegion1(T, p)
		warm, cold := waterRegion1(T+dT, p), waterRegion1(T-dT, p)
		high, low := waterRegion1(T, p+dp), waterRegion1(T, p-dp)
		gibbs := func(r region1, T float64) float64 { return r.enthalpy - T*r.entropy }
		dvdT, dvdp := (warm.volume-cold.volume)/(2*dT), (high.volume-low.volume)/(2*dp)
		check := func(name string, got, want, tolerance float64) {
			if math.Abs(got-want) > tolerance {
				t.Fatalf("%s at %g K, %g Pa: %.8g, want %.8g", name, T, p, got, want)
			}
		}
		check("v", (gibbs(high, T)-gibbs(low, T))/(2*dp), at.volume, 1e-7*at.volume)
		check("s", -(gibbs(warm, T+dT)-gibbs(cold, T-dT))/(2*dT), at.entropy, 0.05)
		check("c_p", (warm.enthalpy-cold.enthalpy)/(2*dT), at.isobaricHeat, 1e-3*at.isobaricHeat)
		check("Maxwell", (high.entropy-low.entropy)/(2*dp), -dvdT, 5e-10+3e-3*math.Abs(dvdT))
		check("c_p − c_v", at.isobaricHeat-at.isochoric, -T*dvdT*dvdT/dvdp, 0.5+5e-3*(at.isobaricHeat-at.isochoric))
		up, down := isentrope(T, p+dp, at.entropy), isentrope(T, p-dp, at.entropy)
		check("w", math.Sqrt(2*dp/(1/up.volume-1/down.volume)), at.soundSpeed, 2e-5*at.soundSpeed)
	})
}

// isentrope is the state at p with entropy s, near temperature T.
func isentrope(T, p, s float64) region1 {
	for range 8 {
		r := waterRegion1(T, p)
		T -= (r.entropy - s) * T / r.isobaricHeat
	}
	return waterRegion1(T, p)
}

// Stability and sense of direction: density rises with pressure and, above
// 4 °C, falls with temperature; viscosity and surface tension fall with
// temperature; the vapour pressure rises with it; c_p ≥ c_v.
func TestWaterMonotone(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		T := rapid.Float64Range(278, 620).Draw(t, "T")
		p := rapid.Float64Range(saturationPressureWater(T+3)*1.01, 99e6).Draw(t, "p")
		at := waterAt(State{Temperature: T, Pressure: p})
		warm := waterAt(State{Temperature: T + 3, Pressure: p})
		pressed := waterAt(State{Temperature: T, Pressure: p + 1e6})
		if !(warm.Density < at.Density && pressed.Density > at.Density) {
			t.Fatalf("density %g, %g warmer, %g pressed", at.Density, warm.Density, pressed.Density)
		}
		if !(warm.Viscosity < at.Viscosity && warm.SurfaceTension < at.SurfaceTension && warm.VapourPressure > at.VapourPressure) {
			t.Fatalf("%+v and 3 K warmer %+v", at, warm)
		}
		if at.HeatCapacityRatio < 1 {
			t.Fatalf("c_p/c_v = %g", at.HeatCapacityRatio)
		}
	})
}

// Water is densest near 4 °C: 3.98 °C and 999.97 kg/m³ at one atmosphere,
// common knowledge.
func TestWaterDensestNearFourDegrees(t *testing.T) {
	best, bestT := 0.0, 0.0
	for i := range 1001 {
		T := 273.15 + 0.01*float64(i)
		if ρ := 1 / waterRegion1(T, standardAtmosphere).volume; ρ > best {
			best, bestT = ρ, T
		}
	}
	if math.Abs(bestT-277.13) > 0.1 || math.Abs(best-999.97) > 0.02 {
		t.Errorf("densest %.4f kg/m³ at %.2f K", best, bestT)
	}
}

// Clausius and Clapeyron hold within the reach of the ideal gas: the slope of
// the vapour pressure gives the heat of vaporisation, 2442 kJ/kg at 25 °C
// (steam tables, from memory).
func TestSlopeOfVapourPressure(t *testing.T) {
	const T, d = 298.15, 0.05
	p := saturationPressureWater(T)
	slope := (saturationPressureWater(T+d) - saturationPressureWater(T-d)) / (2 * d)
	liquid := waterRegion1(T, p).volume
	vapour := gasConstantWater*T/p*0.9985 - liquid // B = −1.2e-3 m³/mol takes 0.15 % off
	if heat := T * slope * vapour; !near(heat, 2442e3, 2e-3) {
		t.Errorf("heat of vaporisation %.5g J/kg", heat)
	}
}

func BenchmarkWater(b *testing.B) {
	s := State{Temperature: 300, Pressure: 3e6}
	b.ReportAllocs()
	for b.Loop() {
		if _, err := water.At(s); err != nil {
			b.Fatal(err)
		}
	}
}

func BenchmarkSeawater(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		if _, err := seawater.At(seawater.Default); err != nil {
			b.Fatal(err)
		}
	}
}

func TestWaterIsAnsweredWithoutAllocation(t *testing.T) {
	s := State{Temperature: 300, Pressure: 3e6}
	if n := testing.AllocsPerRun(100, func() { _, _ = water.At(s) }); n != 0 {
		t.Errorf("%g allocations", n)
	}
}
