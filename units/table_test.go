package units

import (
	"bufio"
	"math"
	"os"
	"path/filepath"
	"slices"
	"strconv"
	"strings"
	"testing"

	"gonum.org/v1/gonum/unit"
)

// csvRows reads a table of testdata without its comments and its header. No cell
// of these tables contains a comma.
func csvRows(t *testing.T, name string, columns int) [][]string {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "testdata", "tables", name))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	var rows [][]string
	for lines := bufio.NewScanner(f); lines.Scan(); {
		line := lines.Text()
		if line == "" || strings.HasPrefix(line, "#") {
			continue
		}
		cells := strings.Split(line, ",")
		if len(cells) != columns {
			t.Fatalf("%s: %q has %d cells, not %d", name, line, len(cells), columns)
		}
		rows = append(rows, cells)
	}
	return rows[1:]
}

func mustCompile(t *testing.T, text string) *compiled {
	t.Helper()
	c, f := compile(text)
	if f != nil {
		t.Fatalf("%q: %s", text, f.detail)
	}
	return c
}

func number64(t *testing.T, s string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(s, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

// ratio is how many of the second unit one of the first is.
func ratio(t *testing.T, one, to string) float64 {
	t.Helper()
	a, b := mustCompile(t, one), mustCompile(t, to)
	if !unit.DimensionsMatch(a.u, b.u) {
		t.Fatalf("%s and %s have different dimensions", one, to)
	}
	return a.si.mul / a.si.div / (b.si.mul / b.si.div)
}

func TestFactorsAgainstSP811(t *testing.T) {
	ran, exact := 0, 0
	for _, row := range csvRows(t, "sp811.csv", 5) {
		one, to, printed, digits := row[0], row[1], number64(t, row[2]), number64(t, row[3])
		got := ratio(t, one, to)
		ran++
		if row[4] == "yes" {
			exact++
			// A product of several factors may be off by its last bits.
			if math.Abs(got/printed-1) > 0x1p-51 {
				t.Errorf("%s = %.17g %s, exactly %s", one, got, to, row[2])
			}
			continue
		}
		unitOfLastDigit := math.Pow(10, math.Floor(math.Log10(printed))-digits+1)
		if math.Abs(got-printed) > 0.500001*unitOfLastDigit {
			t.Errorf("%s = %.10g %s, printed %s", one, got, to, row[2])
		}
	}
	if ran != 109 || exact != 46 {
		t.Errorf("%d rows, of them %d exact", ran, exact)
	}
}

// The definitions that the table of units is made of are exact, so their
// conversions must be as well.
func TestExactConversions(t *testing.T) {
	rows := []struct {
		text string
		k    Kind
		want float64
	}{
		{"12.5 mm", Length, 0.0125}, {"7.3 um", Length, 7.3e-6}, {"1 in", Length, 0.0254}, {"1 mi", Length, 1609.344},
		{"1 mm3", Volume, 1e-9}, {"3 mm2", Area, 3e-6}, {"1 L", Volume, 1e-3}, {"7.85 g/cm3", Density, 7850},
		{"210 GPa", Modulus, 210e9}, {"1 bar", Pressure, 1e5}, {"1013 mbar", Pressure, 101300}, {"1 atm", Pressure, 101325},
		{"1 cP", DynamicViscosity, 1e-3}, {"1 cSt", KinematicViscosity, 1e-6}, {"1 lbm", Mass, 0.45359237}, {"1 lbf", Force, 4.4482216152605},
		{"3000 rpm", Frequency, 50}, {"1.7 kHz", Frequency, 1700}, {"90 deg", Angle, math.Pi / 2}, {"36 km/h", Speed, 10},
		{"20 degC", Temperature, 293.15}, {"-273.15 degC", Temperature, 0}, {"-459.67 degF", Temperature, 0}, {"491.67 degR", Temperature, 273.15},
		{"32 degF", Temperature, 273.15}, {"212 °F", Temperature, 373.15}, {"2 %", Damping, 0.02}, {"35 ppt", Salinity, 35}, {"3.5 %", Salinity, 35},
		{"0.035 kg/kg", Salinity, 35}, {"1 slug", Mass, 4.4482216152605 / 0.3048}, {"1 slinch", Mass, 4.4482216152605 / 0.0254},
		{"1 mN/m", SurfaceTension, 1e-3}, {"5 mm/m", Dimensionless, 5e-3}, {"6.2831853071795864769 rad/s", Frequency, 1}, {"360 deg/s", Frequency, 1},
	}
	ran := 0
	for _, r := range rows {
		q, err := Parse(r.text, r.k)
		if err != nil {
			t.Errorf("%s: %v", r.text, err)
			continue
		}
		if math.Abs(q.Value-r.want) > 4e-16*math.Abs(r.want) {
			t.Errorf("%s = %.17g, want %.17g", r.text, q.Value, r.want)
		}
		ran++
	}
	if ran != 36 {
		t.Errorf("%d rows", ran)
	}
}

// disagreements are the units that UCUM defines differently.
var disagreements = map[string]string{
	"mmHg": "UCUM rounds the column of mercury to 133.322 Pa/mm; the conventional one is 13595.1 kg/m³ at standard gravity",
	"inHg": "as mmHg",
}

func TestFactorsAgainstUCUM(t *testing.T) {
	const tolerance = 1e-9
	codes := csvRows(t, "ucum/codes.csv", 5)
	rows := csvRows(t, "ucum/factors.csv", 6)
	known := map[string]bool{}
	disagree := 0
	for _, row := range rows {
		one, si := row[0], row[1]
		known[one] = true
		if row[4] == "" || row[5] == "" {
			t.Fatalf("%s: no library or version", one)
		}
		c, to := mustCompile(t, one), mustCompile(t, si)
		if !unit.DimensionsMatch(c.u, to.u) {
			t.Errorf("%s is not of the dimension of %s", one, si)
			continue
		}
		off := false
		for i, x := range []float64{1, 100} {
			got := c.convert(x, Dimensionless) / (to.si.mul / to.si.div)
			off = off || math.Abs(got/number64(t, row[2+i])-1) > tolerance
		}
		if off {
			disagree++
		}
		if _, expected := disagreements[one]; off != expected {
			t.Errorf("%s: ours is %.12g %s, theirs %s", one, c.convert(1, Dimensionless), si, row[2])
		}
	}
	if len(rows) != 150 || disagree != len(disagreements) || disagree != 2 {
		t.Errorf("%d rows, %d disagreements", len(rows), disagree)
	}

	// Every unit of the table has been put to the library, or there is a reason.
	absent := 0
	listed := map[string]bool{}
	for _, row := range codes {
		listed[row[0]] = true
		if known[row[0]] {
			continue
		}
		absent++
		if row[1] != "" || row[4] == "" {
			t.Errorf("%s: no result and no reason", row[0])
		}
	}
	for _, u := range Table() {
		if !listed[u.Symbol] {
			t.Errorf("%s is not in codes.csv", u.Symbol)
		}
	}
	if absent != 8 {
		t.Errorf("%d units without a code", absent)
	}
}

func TestTableIsComplete(t *testing.T) {
	required := strings.Fields(`m kg s A K mol cd Hz N Pa J W C V F ohm S Wb T H lm lx Bq Gy Sv kat rad sr
		g t min h d L bar mbar atm degC degF degR in ft yd mi nmi kn mph km/h lbm slug slinch lbf kip psi psf ksi inHg mmHg mmH2O inH2O
		P cP St cSt rpm cycle gal gpm L/min m3/h dyn kgf Torr kp erg cfm ft3 ftH2O deg g0 % knot Ω l`)
	for _, s := range required {
		mustCompile(t, s)
	}
	if len(required) != 84 {
		t.Errorf("%d units", len(required))
	}
	list := Table()
	for _, u := range list {
		if u.Name == "" || u.Source == "" || u.SI == "" || !(u.Factor > 0) {
			t.Errorf("incomplete: %+v", u)
		}
		c, si := mustCompile(t, u.Symbol), mustCompile(t, u.SI)
		if !unit.DimensionsMatch(c.u, si.u) {
			t.Errorf("%s: %s is another dimension", u.Symbol, u.SI)
		}
	}
	if len(list) != len(table) || len(list) != 89 {
		t.Errorf("%d rows", len(list))
	}
	list[0].Symbol = "changed"
	if table[0].symbol == "changed" {
		t.Error("the catalogue hands out the table itself")
	}
}

// No text means two units: a symbol is no alias of another row and can't be
// read as a prefix and another unit.
func TestSymbolsAreUnambiguous(t *testing.T) {
	seen := map[string]bool{}
	for _, s := range symbols() {
		if seen[s] && s != "kg" { // a row of its own, and a thousand grams
			t.Errorf("%q can be read in two ways", s)
		}
		seen[s] = true
		if _, _, ok := lookup(s); !ok {
			t.Errorf("%q is listed and not found", s)
		}
		if len(s) > longestGuess {
			t.Errorf("%q is too long to be guessed", s)
		}
	}
	if len(seen) < 1000 {
		t.Errorf("only %d symbols", len(seen))
	}
	for _, s := range []string{"kkg", "kmin", "mdeg", "Mpsi", "kft", "mmm", "kdegC", "µ", "k", "", "dakg"} {
		if _, _, ok := lookup(s); ok {
			t.Errorf("%q is accepted", s)
		}
	}
}

func TestPrefixes(t *testing.T) {
	powers := map[string]int{"q": -30, "r": -27, "y": -24, "z": -21, "a": -18, "f": -15, "p": -12, "n": -9, "u": -6, "µ": -6, "μ": -6, "m": -3, "c": -2, "d": -1,
		"da": 1, "h": 2, "k": 3, "M": 6, "G": 9, "T": 12, "P": 15, "E": 18, "Z": 21, "Y": 24, "R": 27, "Q": 30}
	if len(powers) != len(prefixes) {
		t.Errorf("%d prefixes, not %d", len(prefixes), len(powers))
	}
	for p, n := range powers {
		for _, base := range []string{"m", "N", "Pa", "Ω"} {
			if got, want := ratio(t, p+base, base), number64(t, "1e"+strconv.Itoa(n)); math.Abs(got/want-1) > 3e-16 {
				t.Errorf("%s%s: %g, want %g", p, base, got, want)
			}
			// A prefix is raised with its unit.
			if n > -20 && n < 20 {
				got, want := ratio(t, p+base+"2", base+"2"), number64(t, "1e"+strconv.Itoa(2*n))
				if math.Abs(got/want-1) > 1e-15 {
					t.Errorf("%s%s2: %g", p, base, got)
				}
			}
		}
	}
}

func TestConfusionsAreNoUnits(t *testing.T) {
	for s, meant := range confusions {
		if s != strings.ToLower(s) {
			t.Errorf("%q is looked up in lower case", s)
		}
		if _, _, ok := lookup(s); ok {
			t.Errorf("%q is a unit", s)
		}
		for _, m := range meant {
			mustCompile(t, m)
		}
	}
	for s, meant := range swaps {
		for _, m := range meant {
			mustCompile(t, m)
		}
		if slices.Contains(meant, s) {
			t.Errorf("%q is meant for itself", s)
		}
	}
	for _, s := range poundWords {
		if _, _, ok := lookup(s); ok {
			t.Errorf("%q is a unit", s)
		}
	}
}
