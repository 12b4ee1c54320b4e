package units

import (
	"math"
	"strings"
	"testing"

	"pgregory.net/rapid"
)

func TestFormat(t *testing.T) {
	rows := []struct {
		value float64
		k     Kind
		want  string
	}{
		{0.0125, Length, "12.5 mm"}, {2.5e-6, Length, "2.50 µm"}, {1.5, Length, "1.50 m"}, {120, Length, "120 m"}, {25e3, Length, "25.0 km"}, {0, Length, "0 m"}, {0.99999, Length, "1.00 m"}, {1e-12, Length, "0.00100 nm"}, {3e-13, Length, "3.00e-4 nm"},
		{7850, Density, "7850 kg/m³"}, {1.2041, Density, "1.204 kg/m³"}, {998.2, Density, "998.2 kg/m³"}, {210e9, Modulus, "210 GPa"}, {3.2e9, Modulus, "3.20 GPa"}, {101325, Pressure, "101.3 kPa"}, {2e5, GaugePressure, "200 kPa"}, {12, PressureDifference, "12.0 Pa"},
		{1.2, Speed, "1.20 m/s"}, {-4.25, Speed, "-4.25 m/s"}, {2e-3, Speed, "2.00 mm/s"}, {3200, Frequency, "3.20 kHz"}, {0.08, Frequency, "0.0800 Hz"}, {999.97, Frequency, "1.00 kHz"}, {12, Frequency, "12.0 Hz"},
		{1.002e-3, DynamicViscosity, "1.002 mPa s"}, {1.81e-5, DynamicViscosity, "18.1 µPa s"}, {1.004e-6, KinematicViscosity, "1.004 mm²/s"}, {0.0728, SurfaceTension, "72.8 mN/m"},
		{293.15, Temperature, "20.0 °C"}, {273.15, Temperature, "0 °C"}, {273.16, Temperature, "0.0100 °C"}, {77.36, Temperature, "77.36 K"}, {233.15, Temperature, "-40.0 °C"}, {math.Pi / 6, Angle, "30.0°"},
		{0.05, Dimensionless, "0.05"}, {0.02, Damping, "0.02"}, {3900, Dimensionless, "3900"}, {1.234567e6, Dimensionless, "1.235e6"}, {35, Salinity, "35.0 g/kg"}, {6.5, Resistance, "6.50 Ω"}, {33e-9, Capacitance, "33.0 nF"}, {7.2, ForceFactor, "7.20 T m"},
		{2.5e3, Force, "2.50 kN"}, {1.5e4, RotationalStiffness, "15.0 kN m/rad"}, {3.2e3, BendingStiffnessBeam, "3.20 kN m²"}, {120, BendingStiffnessPlate, "120 N m"}, {4184, SpecificHeat, "4184 J/(kg K)"}, {0.6, ThermalConductivity, "0.600 W/(m K)"},
		{0.25, Area, "0.250 m²"}, {1.5e-3, Volume, "1.50 L"}, {12, Mass, "12.0 kg"}, {1.25e4, Mass, "12.5 t"}, {8.5, Time, "8.50 s"}, {9.81, Acceleration, "9.81 m/s²"}, {1.8, MassPerLength, "1.80 kg/m"}, {15, MassPerArea, "15.0 kg/m²"}, {0.3, Inertia, "0.300 kg m²"}, {0.3, InertiaPerLength, "0.300 kg m"},
		{2.5e5, Stiffness, "250 kN/m"}, {4e4, StiffnessPerLength, "40.0 kN/m²"}, {1400, ForcePerLength, "1.40 kN/m"}, {5, Kind(99), "5"}, {math.NaN(), Length, "undefined nm"}, {math.Inf(1), Temperature, "infinite °C"},
	}
	covered := map[Kind]bool{}
	for _, r := range rows {
		covered[r.k] = true
		if got := Format(r.value, r.k); got != r.want {
			t.Errorf("%g of %s: %q, want %q", r.value, r.k, got, r.want)
		}
	}
	if len(rows) != 64 {
		t.Errorf("%d rows", len(rows))
	}
	for _, k := range Kinds() {
		if !covered[k] {
			t.Errorf("%s is not tried", k)
		}
	}
}

func TestAppendNumber(t *testing.T) {
	rows := []struct {
		x      float64
		digits int
		want   string
	}{
		{0, 3, "0"}, {math.Copysign(0, -1), 3, "0"}, {1, 3, "1"}, {-1.5, 3, "-1.5"}, {0.001, 3, "0.001"}, {0.0009996, 3, "0.001"}, {0.0009994, 3, "9.99e-4"}, {1.2e-6, 3, "1.2e-6"}, {99999, 5, "99999"}, {99999, 4, "1e5"},
		{12345.6, 4, "12350"}, {12345.6, 2, "12000"}, {1e5, 4, "1e5"}, {1.2345e300, 4, "1.234e300"}, {5e-324, 3, "4.94e-324"}, {0.1, 17, "0.10000000000000001"}, {math.Pi, 0, "3"}, {math.Pi, 99, "3.1415926535897931"}, {9.999, 3, "10"},
		{math.NaN(), 3, "undefined"}, {math.Inf(1), 3, "infinite"}, {math.Inf(-1), 3, "-infinite"},
	}
	for _, r := range rows {
		if got := string(AppendNumber(nil, r.x, r.digits)); got != r.want {
			t.Errorf("%g to %d digits: %s, want %s", r.x, r.digits, got, r.want)
		}
	}
	if len(rows) != 22 {
		t.Errorf("%d rows", len(rows))
	}
	if got := string(AppendNumber([]byte("x = "), 2.5, 3)); got != "x = 2.5" {
		t.Error(got)
	}
}

// within4 says whether two values are the same to four printed digits.
func within4(a, b float64, k Kind) bool {
	if k == Temperature && math.Abs(a-b) <= 0.0051 {
		return true // written in hundredths of a degree
	}
	if k == Temperature {
		a, b = a-273.15, b-273.15 // the digits are those of degrees Celsius
	}
	return math.Abs(a-b) <= 5.001e-4*math.Abs(b)
}

// What is written can be read, and is the same to the digits that are written.
func TestFormatAndParseAreInverse(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		k := rapid.SampledFrom(Kinds()).Draw(t, "kind")
		mantissa := rapid.Float64Range(1, 10).Draw(t, "mantissa")
		value := mantissa * math.Pow(10, float64(rapid.IntRange(-30, 30).Draw(t, "exponent")))
		if k != Temperature && rapid.Bool().Draw(t, "negative") {
			value = -value
		}
		text := Format(value, k)
		q, err := Parse(text, k)
		if err != nil {
			t.Fatalf("%g of %s is written %q: %v", value, k, text, err)
		}
		if !within4(q.Value, value, k) {
			t.Fatalf("%g of %s is written %q, which is %g", value, k, text, q.Value)
		}
		digits := strings.Map(func(r rune) rune {
			if r >= '0' && r <= '9' {
				return r
			}
			return -1
		}, strings.SplitN(strings.TrimLeft(text, "-0."), "e", 2)[0])
		if len(digits) == 0 {
			t.Fatalf("%q has no digits", text)
		}
	})
}

func TestNumberRoundTrip(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64().Draw(t, "x")
		if !representable(x) {
			return
		}
		digits := rapid.IntRange(1, 15).Draw(t, "digits")
		text := string(AppendNumber(nil, x, digits))
		q, err := Parse(text, Dimensionless)
		if math.Abs(x) > 1e307 || math.Abs(x) < 1e-306 {
			return // the last digit may leave the range
		}
		if err != nil || math.Abs(q.Value-x) > 0.501*math.Pow(10, 1-float64(digits))*math.Abs(x)+1e-300 {
			t.Fatalf("%g to %d digits is %s: %v, %v", x, digits, text, q.Value, err)
		}
	})
}

func TestAppendDoesNotAllocate(t *testing.T) {
	buffer := make([]byte, 0, 64)
	for _, k := range Kinds() {
		if n := testing.AllocsPerRun(50, func() { buffer = AppendFormat(buffer[:0], 1234.5678, k) }); n != 0 {
			t.Errorf("%s: %g allocations", k, n)
		}
	}
}

func BenchmarkAppendFormat(b *testing.B) {
	buffer := make([]byte, 0, 64)
	b.ReportAllocs()
	for b.Loop() {
		buffer = AppendFormat(buffer[:0], 7850, Density)
	}
}
