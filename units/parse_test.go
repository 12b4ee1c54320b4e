package units

import (
	"errors"
	"math"
	"strconv"
	"strings"
	"sync"
	"testing"
	"unicode/utf8"

	"gonum.org/v1/gonum/unit"
	"pgregory.net/rapid"
)

// One unit in all its spellings.
func TestSpellings(t *testing.T) {
	rows := []struct {
		like  string
		texts []string
	}{
		{"m/s", []string{"m/s", "m / s", "m per s", "m s^-1", "m s-1", "m s⁻¹", "m·s⁻¹", "m*s**-1", "m.s^(-1)", "(m)/(s)", "m⋅s^-1", "m s−1", "m s^−1", "1/(s/m)", "m\u00a0s⁻¹", "m×s-1", "s-1 m"}},
		{"kg/(m s2)", []string{"Pa", "N/m2", "N/m^2", "N/m**2", "N/m²", "kg/m/s2", "kg/(m·s²)", "kg m^-1 s^-2", "J/m3", "N m⁻²", "kg/(m s^2)", "kg per (m s2)", "kg per m per s2", "N/(m)2", "N/(m)^2", "(N)/m²"}},
		{"um", []string{"um", "µm", "μm", "(um)"}},
		{"kg m2/s2", []string{"N m", "N·m", "N*m", "N.m", "N (m)", "N(m)", "J", "kg (m/s)^2", "kg (m/s)2", "kg (m/s)²", "W s", "m N"}},
		{"ohm", []string{"ohm", "Ω", "\u2126", "V/A", "kg m2/(s3 A2)"}},
		{"mmH2O", []string{"mmH2O", "mmH2O^1"}},
		{"mmH2O mmH2O", []string{"mmH2O2", "mmH2O²"}},
		{"g0 g0", []string{"g0^2", "g0²"}},
		{"1/m", []string{"1/m", "m^-1", "m-1", "m⁻¹", "1/(m)", "1 / m"}},
	}
	ran := 0
	for _, r := range rows {
		like := mustCompile(t, r.like)
		for _, text := range r.texts {
			ran++
			c, f := compile(text)
			if f != nil {
				t.Errorf("%q: %s", text, f.detail)
				continue
			}
			a, b := c.si.mul/c.si.div, like.si.mul/like.si.div
			if !unit.DimensionsMatch(c.u, like.u) || math.Abs(a/b-1) > 1e-14 {
				t.Errorf("%q is not %q", text, r.like)
			}
		}
	}
	if ran != 66 {
		t.Errorf("%d rows", ran)
	}
}

func TestExpressionsRefused(t *testing.T) {
	rows := []struct {
		text string
		code Code
	}{
		{"m//s", CodeSyntax}, {"m/", CodeSyntax}, {"/s", CodeSyntax}, {"m*", CodeSyntax}, {"m..s", CodeSyntax}, {"()", CodeSyntax}, {"(m", CodeSyntax}, {"m)", CodeSyntax},
		{"m^", CodeSyntax}, {"m^x", CodeSyntax}, {"m^0", CodeSyntax}, {"m0", CodeSyntax}, {"m^0.5", CodeSyntax}, {"m^1.5", CodeSyntax}, {"m^(1/2)", CodeSyntax}, {"m^(2", CodeSyntax},
		{"m^2^2", CodeSyntax}, {"m2^2", CodeSyntax}, {"m²²", CodeSyntax}, {"m^10", CodeSyntax}, {"m^12345678901234567890", CodeSyntax}, {"m²2", CodeSyntax}, {"m⁻", CodeSyntax},
		{"100 m", CodeSyntax}, {"L/100 km", CodeSyntax}, {"10m", CodeSyntax}, {"m,s", CodeSyntax}, {"$", CodeSyntax}, {"m\x00", CodeSyntax}, {"\xff", CodeSyntax}, {"", CodeSyntax},
		{strings.Repeat("(", 40) + "m" + strings.Repeat(")", 40), CodeSyntax}, {strings.Repeat("m ", 60), CodeSyntax}, {strings.Repeat("(", 8) + "m" + strings.Repeat(")", 8), CodeSyntax},
		{"kg/m s", CodeAmbiguousUnit}, {"W/m K", CodeAmbiguousUnit}, {"m/s·s", CodeAmbiguousUnit}, {"(kg/m s)", CodeAmbiguousUnit}, {"J per kg K", CodeAmbiguousUnit},
		{"degC/s", CodeAmbiguousUnit}, {"degC2", CodeAmbiguousUnit}, {"W/(m degF)", CodeAmbiguousUnit}, {"barg/m", CodeAmbiguousUnit}, {"m psu", CodeAmbiguousUnit},
		{"m2s", CodeUnknownUnit}, {"metre", CodeUnknownUnit}, {"m10", CodeSyntax}, {"ミリ", CodeUnknownUnit}, {"e", CodeUnknownUnit}, {"per", CodeUnknownUnit},
		{"Qm9 Qm9", CodeNotFinite}, {"qm9 qm9", CodeNotFinite},
	}
	ran := 0
	for _, r := range rows {
		ran++
		_, f := compile(strings.TrimSpace(r.text))
		if f == nil || f.code != r.code {
			t.Errorf("%q: %+v, want %s", r.text, f, r.code)
		}
	}
	if ran != 52 {
		t.Errorf("%d rows", ran)
	}
}

// A product after a division has the two readings that are suggested.
func TestTwoReadings(t *testing.T) {
	rows := []struct {
		text string
		k    Kind
		want string
	}{
		{"1 kg/m s", DynamicViscosity, "kg/(m s)"},
		{"1 J/kg K", SpecificHeat, "J/(kg K)"},
		{"1 W/m K", ThermalConductivity, "W/(m K)"},
		{"1 kg/s2 m", Length, "kg/(s2 m) or kg m/s2"},
		{"1 kg/s2 m", Force, "kg m/s2"},
		{"1 kg/s2 m", Modulus, "kg/(s2 m)"},
		{"1 1/s m", Speed, "m/s"},
		{"1 kg m/s2 m/s", Time, "kg m/(s2 m)/s or kg m m/(s2 s)"},
		{"1 (kg/s m)/s", Pressure, "(kg/(s m))/s"},
	}
	for _, r := range rows {
		_, err := Parse(r.text, r.k)
		var e *Error
		if !errors.As(err, &e) || e.Code != CodeAmbiguousUnit || e.Suggestion != r.want {
			t.Errorf("%s as %s: %v", r.text, r.k, err)
		}
	}
	if len(rows) != 9 {
		t.Errorf("%d rows", len(rows))
	}
}

// Every message names what was wrong and what would be right.
func TestSuggestions(t *testing.T) {
	rows := []struct {
		text       string
		k          Kind
		code       Code
		suggestion string
	}{
		{"5 hz", Frequency, CodeUnknownUnit, "Hz"}, {"5 HZ", Frequency, CodeUnknownUnit, "Hz"}, {"5 khz", Frequency, CodeUnknownUnit, "kHz"}, {"5 KG", Mass, CodeUnknownUnit, "kg"},
		{"5 Kg/M3", Density, CodeUnknownUnit, "kg/m3"}, {"3 M", Length, CodeUnknownUnit, "m"}, {"3 MM", Length, CodeUnknownUnit, "mm"}, {"3 S", Time, CodeWrongDimension, "s"},
		{"3 H", Time, CodeWrongDimension, "h"}, {"3 M/S", Speed, CodeUnknownUnit, "m/s"}, {"3 m/S", Speed, CodeWrongDimension, "m/s"}, {"210 Gpa", Modulus, CodeUnknownUnit, "GPa"},
		{"210 MPA", Modulus, CodeUnknownUnit, "MPa"}, {"5 pa", Pressure, CodeUnknownUnit, "Pa"}, {"5 T", Mass, CodeWrongDimension, "t"}, {"5 Psi", Pressure, CodeUnknownUnit, "psi"},

		{"5 lb", Mass, CodeAmbiguousUnit, "lbm (mass) or lbf (force)"}, {"5 lbs", Force, CodeAmbiguousUnit, "lbm (mass) or lbf (force)"}, {"5 lb/ft3", Density, CodeAmbiguousUnit, "lbm (mass) or lbf (force)"},
		{"5 LB", Mass, CodeAmbiguousUnit, "lbm (mass) or lbf (force)"},
		{"5 lbf", Mass, CodeWrongDimension, "lbm"}, {"5 kgf", Mass, CodeWrongDimension, "kg"}, {"5 lbf/ft3", Density, CodeWrongDimension, "lbm/ft3"}, {"5 lbf/ft", MassPerLength, CodeWrongDimension, "lbm/ft"},
		{"5 kg", Force, CodeWrongDimension, "kgf"}, {"5 lbm", Force, CodeWrongDimension, "lbf"}, {"5 kg/cm2", Pressure, CodeWrongDimension, "kgf/cm2"}, {"3 g", Acceleration, CodeWrongDimension, "g0"},

		{"12", Frequency, CodeMissingUnit, "12 Hz or 12 rad/s"}, {"12 1/s", Frequency, CodeWrongKind, "Hz or rad/s"}, {"12 s-1", Frequency, CodeWrongKind, "Hz or rad/s"}, {"4.2", Speed, CodeMissingUnit, "4.2 m/s"},
		{"20", Temperature, CodeMissingUnit, "20 degC or 20 K"}, {"30", Angle, CodeMissingUnit, "30 deg or 30 rad"}, {"35", Salinity, CodeMissingUnit, "35 g/kg or 35 kg/kg"},
		{"1 mm2/s", DynamicViscosity, CodeWrongKind, "kinematic_viscosity"}, {"1 cP", KinematicViscosity, CodeWrongKind, "viscosity"},
		{"30 psia", GaugePressure, CodeWrongKind, "psi or psig"}, {"2 bara", PressureDifference, CodeWrongKind, "bar or barg"}, {"2 barg", Modulus, CodeWrongKind, "bar"}, {"2 kPag", Modulus, CodeWrongKind, "kPa"},
		{"2 psu", Dimensionless, CodeWrongKind, "g/kg"}, {"2 barg/m", Density, CodeAmbiguousUnit, "bar/m"}, {"2 bar(g)", Pressure, CodeWrongDimension, "barg"}, {"2 bar(a)", Pressure, CodeUnknownUnit, "bara"}, {"2 psi g", Pressure, CodeWrongDimension, "psig"},
		{"20 C", Temperature, CodeWrongDimension, "degC"}, {"20 F", Temperature, CodeWrongDimension, "degF"}, {"20 deg", Temperature, CodeWrongDimension, "degC or degF"}, {"20 ° C", Temperature, CodeWrongDimension, "°C"}, {"20 Celsius", Temperature, CodeUnknownUnit, "degC"},
		{"1 degC/s", Temperature, CodeAmbiguousUnit, "K/s"}, {"1 W/(m degF)", ThermalConductivity, CodeAmbiguousUnit, "W/(m degR)"},

		{"5 kph", Speed, CodeUnknownUnit, "km/h"}, {"5 mps", Speed, CodeUnknownUnit, "m/s"}, {"5 kts", Speed, CodeUnknownUnit, "kn"}, {"5 Knots", Speed, CodeUnknownUnit, "knots"}, {"5 sec", Time, CodeUnknownUnit, "s"},
		{"5 metre", Length, CodeUnknownUnit, "m"}, {"5 meters per second", Speed, CodeUnknownUnit, "m per s"}, {"5 pascals", Pressure, CodeUnknownUnit, "Pa"}, {"5 inches", Length, CodeUnknownUnit, "in"}, {"5 cc", Volume, CodeUnknownUnit, "cm3"},
		{"5 Nm", RotationalStiffness, CodeUnknownUnit, "N m"}, {"5 kNm/rad", RotationalStiffness, CodeUnknownUnit, "(kN m)/rad"}, {"5 Pas", DynamicViscosity, CodeUnknownUnit, "Pa s"}, {"5 mpas", DynamicViscosity, CodeUnknownUnit, "mPa s"},
		{"5 mm Hg", Pressure, CodeUnknownUnit, "mmHg"}, {"5 mmhg", Pressure, CodeUnknownUnit, "mmHg"}, {"5 ksii", Modulus, CodeUnknownUnit, "ksi"}, {"5 slgu", Mass, CodeUnknownUnit, "slug"}, {"5 foo", Speed, CodeUnknownUnit, ""}, {"5 x", Length, CodeUnknownUnit, ""},

		{"4,2 m/s", Speed, CodeSyntax, "4.2 m/s"}, {"7,850 kg/m3", Density, CodeSyntax, "7.850 kg/m3 or 7850 kg/m3"}, {"7 850 kg/m3", Density, CodeSyntax, "7850 kg/m3"}, {"1.8-2.4 m/s", Speed, CodeSyntax, "1.8 .. 2.4 m/s"},
		{"1.8 – 2.4 m/s", Speed, CodeSyntax, "1.8 .. 2.4 m/s"}, {"2.4 .. 1.8 m/s", Speed, CodeBadRange, "1.8 .. 2.4 m/s"}, {"2.1 +- 10 % m/s", Speed, CodeSyntax, "2.1 m/s +- 10 %"}, {"2.1 m/s +- 0.2", Speed, CodeMissingUnit, "2.1 m/s +- 0.2 m/s"},
		{"1.8 m/s .. 2.4", Speed, CodeMissingUnit, "1.8 .. 2.4 m/s"}, {"5 % +- 1 %", Damping, CodeAmbiguousUnit, "(5 +- 1) % or (5 +- 1 %) %"},
	}
	ran := 0
	for _, r := range rows {
		ran++
		_, err := Parse(r.text, r.k)
		var e *Error
		if !errors.As(err, &e) {
			t.Errorf("%s as %s is accepted", r.text, r.k)
			continue
		}
		if e.Code != r.code || e.Suggestion != r.suggestion {
			t.Errorf("%s as %s: %s, %q; want %s, %q", r.text, r.k, e.Code, e.Suggestion, r.code, r.suggestion)
		}
		if r.suggestion != "" && !strings.Contains(e.Error(), r.suggestion+"?") {
			t.Errorf("%s: %s", r.text, e)
		}
		sentence(t, e)
	}
	if ran != 83 {
		t.Errorf("%d rows", ran)
	}
}

// sentence checks what every message has in common.
func sentence(t interface{ Errorf(string, ...any) }, e *Error) {
	s := e.Error()
	switch {
	case e.Code == "" || e.Want == "" || e.Detail == "":
		t.Errorf("incomplete: %+v", *e)
	case strings.Contains(s, "units.") || strings.Contains(s, "float64") || strings.Contains(s, "strconv"):
		t.Errorf("a type of the program in a message: %s", s)
	case !utf8.ValidString(s) || strings.ContainsAny(s, "\n\x00") || len(s) > 1200:
		t.Errorf("not one clean sentence: %q", s)
	}
}

// Suggested units are units, and fit.
func TestSuggestedUnitsFit(t *testing.T) {
	bad := []string{"hz", "KG", "M", "S", "mpas", "Nm", "kph", "meter", "MPA", "feet", "grm", "lbf", "kgf", "Knots", "psii", "deg c", "kNm", "M/S", "kg/m s", "J/kg K"}
	suggested := 0
	for _, text := range bad {
		for _, k := range Kinds() {
			_, err := FromValueUnit(1, text, k)
			var e *Error
			if !errors.As(err, &e) || e.Code == CodeWrongKind || e.Suggestion == "" {
				continue
			}
			for _, s := range strings.Split(e.Suggestion, either) {
				suggested++
				if _, f := compile(s); f != nil {
					t.Errorf("%s as %s: %q is no unit", text, k, s)
				}
			}
		}
	}
	if suggested < 300 {
		t.Errorf("%d suggestions", suggested)
	}
}

func TestNumbers(t *testing.T) {
	rows := []struct {
		text string
		want float64
	}{
		{"4.2 m", 4.2}, {"4.2m", 4.2}, {" 4.2  m ", 4.2}, {"-4.2 m", -4.2}, {"−4.2 m", -4.2}, {"+4.2 m", 4.2}, {".5 m", 0.5}, {"5. m", 5}, {"1e3 m", 1000}, {"1E3 m", 1000}, {"1e-3 m", 1e-3},
		{"1e−3 m", 1e-3}, {"1.5e+2 m", 150}, {"0 m", 0}, {"0e500 m", 0}, {"-0 m", 0}, {"1e308 m", 1e308}, {"007 m", 7}, {"4.2\u00a0m", 4.2}, {"1e3mm", 1},
	}
	for _, r := range rows {
		if q, err := Parse(r.text, Length); err != nil || q.Value != r.want {
			t.Errorf("%q: %v, %v", r.text, q.Value, err)
		}
	}
	refused := []struct {
		text string
		code Code
	}{
		{"", CodeSyntax}, {"   ", CodeSyntax}, {"m", CodeSyntax}, {"m/s", CodeSyntax}, {".", CodeSyntax}, {"-", CodeSyntax}, {"e3 m", CodeSyntax}, {"..5 m", CodeSyntax}, {"--5 m", CodeSyntax},
		{"0x10 m", CodeUnknownUnit}, {"1_000 m", CodeUnknownUnit}, {"1e m", CodeUnknownUnit}, {"1.2.3 m", CodeSyntax}, {"1e400 m", CodeNotFinite}, {"-1e400 m", CodeNotFinite}, {"1e308 km", CodeNotFinite},
		{"1e-400 m", CodeNotFinite}, {"1e-310 m", CodeNotFinite}, {"1e-300 qm", CodeNotFinite}, {"NaN", CodeNotFinite}, {"nan m", CodeNotFinite}, {"Inf m", CodeNotFinite}, {"-infinity m", CodeNotFinite}, {"+Inf m", CodeNotFinite},
		{"٣ m", CodeSyntax}, {"½ m", CodeSyntax}, {"１ m", CodeSyntax}, {"\xff\xfe", CodeSyntax}, {"5 \xff", CodeSyntax}, {"5 m\u200b", CodeSyntax}, {"💥", CodeSyntax}, {strings.Repeat("9", 400), CodeSyntax},
		{"(2.1) m", CodeSyntax}, {"(", CodeSyntax}, {"()", CodeSyntax}, {")", CodeSyntax}, {"5 (m", CodeSyntax},
	}
	for _, r := range refused {
		_, err := Parse(r.text, Length)
		var e *Error
		if !errors.As(err, &e) || e.Code != r.code {
			t.Errorf("%q: %v, want %s", r.text, err, r.code)
			continue
		}
		sentence(t, e)
	}
	if len(rows) != 20 || len(refused) != 37 {
		t.Errorf("%d and %d rows", len(rows), len(refused))
	}
}

func TestFromNumber(t *testing.T) {
	for _, k := range Kinds() {
		q, err := FromNumber(0.25, k)
		if k == Dimensionless || k == Damping {
			if err != nil || q != (Quantity{Value: 0.25}) {
				t.Errorf("%s: %+v, %v", k, q, err)
			}
			continue
		}
		var e *Error
		if !errors.As(err, &e) || e.Code != CodeMissingUnit || !strings.Contains(e.Suggestion, "0.25") {
			t.Errorf("%s: %v", k, err)
		}
	}
	for _, x := range []float64{math.NaN(), math.Inf(1), math.Inf(-1), 5e-324} {
		for _, k := range []Kind{Dimensionless, Length} {
			if _, err := FromNumber(x, k); err == nil {
				t.Errorf("%g is accepted as %s", x, k)
			}
			if _, err := FromValueUnit(x, k.SI(), k); err == nil {
				t.Errorf("%g %s is accepted", x, k.SI())
			}
		}
	}
}

// Units form a group: products, quotients and powers of factors are the factors
// of products, quotients and powers.
func TestUnitAlgebra(t *testing.T) {
	var texts []string
	for i := range table {
		if e := &table[i]; e.offset == 0 && e.mark == plain && e.symbol != "1" {
			texts = append(texts, e.symbol)
		}
	}
	value := func(s string) (float64, *unit.Unit) {
		p := parser{src: s}
		term, f := p.product()
		if f != nil {
			t.Fatalf("%q: %s", s, f.detail)
		}
		return term.factor(), term.u
	}
	near := func(a, b float64) bool { return math.Abs(a/b-1) < 1e-13 }
	rapid.Check(t, func(t *rapid.T) {
		a := rapid.SampledFrom(texts).Draw(t, "a")
		b := rapid.SampledFrom(texts).Draw(t, "b")
		n := rapid.IntRange(1, 4).Draw(t, "n")
		va, ua := value(a)
		vb, ub := value(b)
		v, u := value(a + " " + b)
		if !near(v, va*vb) || !unit.DimensionsMatch(u, ua.Copy().Mul(ub.Copy())) {
			t.Fatalf("%s %s", a, b)
		}
		v, u = value(a + "/" + b)
		if !near(v, va/vb) || !unit.DimensionsMatch(u, ua.Copy().Div(ub.Copy())) {
			t.Fatalf("%s/%s", a, b)
		}
		inverse, _ := value("1/(" + b + "/" + a + ")")
		if !near(v, inverse) {
			t.Fatalf("inverse of %s/%s", b, a)
		}
		power := strconv.Itoa(n)
		v, _ = value("(" + a + " " + b + ")^" + power)
		w, _ := value(a + "^" + power + " " + b + "^" + power)
		if !near(v, w) || !near(v, math.Pow(va*vb, float64(n))) {
			t.Fatalf("(%s %s)^%d", a, b, n)
		}
		w, _ = value("1/(" + a + " " + b + ")^-" + power)
		if !near(v, w) {
			t.Fatalf("(%s %s)^-%d", a, b, n)
		}
	})
}

// The cache gives every caller the same answer, however many there are, and
// does not grow.
func TestCacheIsSafe(t *testing.T) {
	var group sync.WaitGroup
	for worker := range 4 {
		group.Go(func() {
			for i := range 2000 {
				a, b := 1+(i+worker)%9, 1+i/9%9
				c, d := 1+i/81%9, 1+i/729%9
				text := "m" + strconv.Itoa(a) + " s" + strconv.Itoa(b) + " kg" + strconv.Itoa(c) + "/A" + strconv.Itoa(d)
				x, f := compile(text)
				if f != nil || x.text != text {
					t.Errorf("%q: %v", text, f)
				}
				if got := x.u.Dimensions(); got[unit.LengthDim] != a || got[unit.TimeDim] != b || got[unit.MassDim] != c || got[unit.CurrentDim] != -d {
					t.Errorf("%q: %v", text, got)
				}
				if q, err := Parse("4.2 m/s", Speed); err != nil || q.Value != 4.2 {
					t.Errorf("%v, %v", q, err)
				}
			}
		})
	}
	group.Wait()
}

func TestParseDoesNotAllocate(t *testing.T) {
	for _, text := range []string{"4.2 m/s", "2.1 +- 0.2 m/s", "1.8 .. 2.4 m/s", "2.1 m/s +- 10 %", "36 km/h"} {
		if n := testing.AllocsPerRun(100, func() { _, _ = Parse(text, Speed) }); n != 0 {
			t.Errorf("%s: %g allocations", text, n)
		}
	}
}

func FuzzParse(f *testing.F) {
	seeds := []string{"4.2 m/s", "2.1 +- 0.2 m/s", "2.1 ± 10 %", "1.8 .. 2.4 m/s", "(2.1 +- 0.2) m/s", "20 degC", "3 psig", "5 kg/m s", "5 lb", "1e400 m", "NaN",
		"5 m^(-2)", "5 s⁻¹", "5 µm", "((((", "5 Nm", "4,2 m", "1-2 m", "5 foo/bar", "+-", "..", "5 % +- 1 %", "\xff", "5 m per s", "−5 °C", "2 m/s/s m"}
	for _, s := range seeds {
		for _, k := range []Kind{Dimensionless, Length, Speed, Temperature, Pressure} {
			f.Add(s, uint8(k))
		}
	}
	f.Fuzz(func(t *testing.T, s string, kind uint8) {
		k := Kind(kind)
		q, err := Parse(s, k)
		if err != nil {
			var e *Error
			if !errors.As(err, &e) {
				t.Fatalf("%q: %T", s, err)
			}
			sentence(t, e)
			return
		}
		if !representable(q.Value) || !representable(q.Spread) || q.Spread < 0 || (q.Form == Certain) != (q.Spread == 0) {
			t.Fatalf("%q: %+v", s, q)
		}
		if q.Low() > q.High() || k == Temperature && q.Low() < -1e-9*math.Abs(q.Value) {
			t.Fatalf("%q: %+v", s, q)
		}
		if again, err := Parse(s, k); err != nil || again != q {
			t.Fatalf("%q: %+v and then %+v, %v", s, q, again, err)
		}
		back, err := Parse(Format(q.Value, k), k)
		if err != nil {
			t.Fatalf("%q is written as %q: %v", s, Format(q.Value, k), err)
		}
		if !within4(back.Value, q.Value, k) {
			t.Fatalf("%q is written as %q", s, Format(q.Value, k))
		}
	})
}

func BenchmarkParse(b *testing.B) {
	for _, text := range []string{"4.2 m/s", "1.8 .. 2.4 m/s", "2.1 m/s +- 10 %", "2.1 +- 0.2 m/s"} {
		b.Run(text, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				_, _ = Parse(text, Speed)
			}
		})
	}
}

// The first sight of an expression, and a mistake.
func BenchmarkRead(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		_, _ = read("lbf s/ft2")
	}
}

func BenchmarkMistake(b *testing.B) {
	for _, text := range []string{"5 hz", "5 ksii", "5 meters per second", "5 pa pa pa pa pa pa pa pa pa pa pa pa pa pa pa", "5 aaaaaaaaaaaa"} {
		b.Run(text, func(b *testing.B) {
			for b.Loop() {
				_, _ = Parse(text, Frequency)
			}
		})
	}
}
