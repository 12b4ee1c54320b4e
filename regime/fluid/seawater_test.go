package fluid

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// UNESCO 44 p. 19 and p. 22, from memory of the report: density in kg/m³ and
// secant bulk modulus in bar.
func TestSeawaterDensityAgainstUNESCO44(t *testing.T) {
	rows := []struct{ S, t, p, ρ, K float64 }{
		{0, 5, 0, 999.96675, 20337.80375}, {0, 5, 1000, 1044.12802, 23643.52599},
		{0, 25, 0, 997.04796, 22100.72106}, {0, 25, 1000, 1037.90204, 25405.09717},
		{35, 5, 0, 1027.67547, 22185.93358}, {35, 5, 1000, 1069.48914, 25577.49819},
		{35, 25, 0, 1023.34306, 23726.34949}, {35, 25, 1000, 1062.53817, 27108.94504},
	}
	for _, r := range rows {
		if got := densitySeawater(r.S, r.t, r.p); math.Abs(got-r.ρ) > 0.6e-5 {
			t.Errorf("ρ(%g, %g, %g) = %.6f, want %.5f", r.S, r.t, r.p, got, r.ρ)
		}
		if got := secantBulkModulus(r.S, r.t, r.p); math.Abs(got-r.K) > 0.6e-5 {
			t.Errorf("K(%g, %g, %g) = %.6f, want %.5f", r.S, r.t, r.p, got, r.K)
		}
	}
	if len(rows) != 8 {
		t.Errorf("ran %d rows, want 8", len(rows))
	}
}

// UNESCO 44 pp. 48 and 49: the check value to three decimals, the table to
// one, from memory of the report.
func TestSeawaterSoundSpeedAgainstUNESCO44(t *testing.T) {
	if got := soundSpeedSeawater(40, 40, 1000); math.Abs(got-1731.995) > 0.6e-3 {
		t.Errorf("c(40, 40, 1000) = %.5f, want 1731.995", got)
	}
	table := map[float64][5][3]float64{ // salinity: 0 to 40 °C by 10; 0, 500, 1000 bar
		25: {{1435.8, 1520.4, 1610.4}, {1477.7, 1561.3, 1647.4}, {1510.3, 1593.6, 1676.8}, {1535.2, 1619.0, 1700.6}, {1553.4, 1638.0, 1719.2}},
		35: {{1449.1, 1534.0, 1623.2}, {1489.8, 1573.4, 1659.0}, {1521.5, 1604.5, 1687.2}, {1545.6, 1629.0, 1710.1}, {1563.2, 1647.3, 1727.8}},
	}
	ran := 0
	for S, rows := range table {
		for i, row := range rows {
			for j, want := range row {
				got := soundSpeedSeawater(S, 10*float64(i), 500*float64(j))
				if math.Abs(got-want) > 0.0501 {
					t.Errorf("c(%g, %d, %d) = %.4f, want %.1f", S, 10*i, 500*j, got, want)
				}
				ran++
			}
		}
	}
	if ran != 30 {
		t.Errorf("ran %d values, want 30", ran)
	}
}

// Without salt the formulas are those of pure water: three works that know
// nothing of one another agree within their accuracies.
func TestSeawaterWithoutSaltIsWater(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := State{
			Temperature: rapid.Float64Range(273.15, 313.15).Draw(t, "T"),
			Pressure:    rapid.Float64Range(standardAtmosphere, 99e6).Draw(t, "p"),
		}
		salt, pure := seawaterAt(s), waterAt(s)
		if !near(salt.Density, pure.Density, 1.5e-4) {
			t.Fatalf("density %.6g, pure %.6g", salt.Density, pure.Density)
		}
		if !near(salt.SoundSpeed, pure.SoundSpeed, 2e-3) {
			t.Fatalf("sound speed %.6g, pure %.6g", salt.SoundSpeed, pure.SoundSpeed)
		}
		if salt.VapourPressure != pure.VapourPressure || salt.SurfaceTension != pure.SurfaceTension {
			t.Fatalf("vapour pressure or surface tension differ without salt")
		}
		s.Pressure = standardAtmosphere
		if salt, pure := seawaterAt(s), waterAt(s); !near(salt.Viscosity, pure.Viscosity, 1e-2) {
			t.Fatalf("viscosity %.5g, pure %.5g", salt.Viscosity, pure.Viscosity)
		}
	})
}

// The density and the sound speed come from different works and must fit by
// thermodynamics: c² (∂ρ/∂p)_T = c_p/c_v. Without salt that is the ratio of
// pure water, which IAPWS-IF97 gives, within 0.0015; salt, which makes water
// expand more in heat, changes it by less than 0.008.
func TestSeawaterSoundSpeedFitsCompressibility(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		S := rapid.OneOf(rapid.Just(0.0), rapid.Float64Range(0, 40)).Draw(t, "S")
		temperature := rapid.Float64Range(0, 40).Draw(t, "t")
		p := rapid.Float64Range(1, 990).Draw(t, "p")
		slope := (densitySeawater(S, temperature, p+1) - densitySeawater(S, temperature, p-1)) / 2e5
		c := soundSpeedSeawater(S, temperature, p)
		pure := waterAt(State{Temperature: zeroCelsius + temperature/scale68, Pressure: standardAtmosphere + p*pascalPerBar})
		γ, allowed := c*c*slope, 1.5e-3+6.5e-3*math.Min(1, S/20)
		if math.Abs(γ-pure.HeatCapacityRatio) > allowed {
			t.Fatalf("c_p/c_v = %g, pure water %g", γ, pure.HeatCapacityRatio)
		}
	})
}

func TestSeawaterMonotone(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := State{
			Temperature: rapid.Float64Range(273.15, 311).Draw(t, "T"),
			Pressure:    rapid.Float64Range(standardAtmosphere, 99e6).Draw(t, "p"),
			Salinity:    rapid.Float64Range(0, 39).Draw(t, "S"),
		}
		at := seawaterAt(s)
		saltier, pressed, warmer := s, s, s
		saltier.Salinity++
		pressed.Pressure += 1e6
		warmer.Temperature += 2
		a, b, c := seawaterAt(saltier), seawaterAt(pressed), seawaterAt(warmer)
		if !(a.Density > at.Density && a.SoundSpeed > at.SoundSpeed && a.Viscosity > at.Viscosity &&
			a.VapourPressure < at.VapourPressure && a.SurfaceTension > at.SurfaceTension) {
			t.Fatalf("%+v, saltier %+v", at, a)
		}
		if !(b.Density > at.Density && b.SoundSpeed > at.SoundSpeed) {
			t.Fatalf("%+v, pressed %+v", at, b)
		}
		if !(c.SoundSpeed > at.SoundSpeed && c.Viscosity < at.Viscosity && c.SurfaceTension < at.SurfaceTension) {
			t.Fatalf("%+v, warmer %+v", at, c)
		}
	})
}

// What the note of the model claims about what it leaves out.
func TestSeawaterNoteHolds(t *testing.T) {
	worst := 0.0
	for T := 273.15; T <= 313.15; T += 2 {
		surface := waterAt(State{Temperature: T, Pressure: standardAtmosphere}).Viscosity
		deep := waterAt(State{Temperature: T, Pressure: 99e6}).Viscosity
		worst = math.Max(worst, math.Abs(deep/surface-1))
	}
	if worst > 0.08 || worst < 0.03 {
		t.Errorf("pressure changes the viscosity of pure water by %.3f", worst)
	}
	t.Logf("pressure changes the viscosity of pure water by up to %.1f %%", 100*worst)

	s := seawater.Default
	atmosphere, err := seawater.At(s)
	if err != nil {
		t.Fatal(err)
	}
	s.Pressure = seawater.PressureRange(s).Min
	vapour, err := seawater.At(s)
	if err != nil {
		t.Fatal(err)
	}
	if atmosphere.Density != vapour.Density {
		t.Error("below one atmosphere the density is not held")
	}
	pure := waterAt(State{Temperature: s.Temperature, Pressure: standardAtmosphere}).Density /
		waterAt(State{Temperature: s.Temperature, Pressure: s.Pressure}).Density
	if pure-1 > 5e-5 {
		t.Errorf("one atmosphere changes the density of pure water by %.2e", pure-1)
	}
	for S := 0.0; S <= 40; S += 5 {
		for T := 1.0; T <= 40; T += 3 {
			later := surfaceTensionWater(zeroCelsius+T) * (1 + 3.766e-4*S + 2.347e-6*S*T) // Nayar et al. 2014, from memory
			if got := surfaceTensionSeawater(zeroCelsius+T, S); !near(got, later, 8e-3) {
				t.Errorf("surface tension at S %g, %g °C: %.5g, later work %.5g", S, T, got, later)
			}
		}
	}
}
