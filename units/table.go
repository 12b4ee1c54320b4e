package units

import (
	"math"
	"slices"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"

	"gonum.org/v1/gonum/unit"
)

// term is a unit or a product of units: u·10^dec·(2π)^turns. Powers of ten and
// turns are counted apart from the value that gonum carries, so that a prefix, a
// cubed millimetre or a kilohertz brings no rounding error of its own.
type term struct {
	u     *unit.Unit
	dec   int
	turns int
}

// entry is a row of the table of units.
type entry struct {
	symbol     string
	aliases    []string
	name       string
	term       term
	offset     float64 // added to a number of this unit before the factor applies
	prefixable bool
	mark       mark
	source     string
}

// Sources of the factors. The tests compare every factor with the values that
// the second prints, and with an implementation of the third.
const (
	brochure = "SI Brochure, 9th edition (2019), tables 2, 4 and 8; from memory"
	sp811    = "NIST SP 811 (2008), appendix B; from memory"
	practice = "engineering practice; the suffix tells gauge from absolute"
	unesco   = "UNESCO technical papers in marine science 36 (1981), practical salinity read as g/kg; from memory"
	inchDef  = "slinch: the mass that 1 lbf accelerates by 1 in/s2"
)

// Definitions, exact (NIST SP 811 (2008), appendix B.6 and B.8; from memory).
const (
	inch     = 0.0254
	foot     = 12 * inch
	yard     = 3 * foot
	mile     = 5280 * foot
	nautical = 1852.0
	gallon   = 231 * inch * inch * inch
	pound    = 0.45359237
	gravity  = 9.80665 // standard acceleration of free fall, m/s²
	force    = pound * gravity
	psi      = force / (inch * inch)
	mercury  = 13595.1 * gravity // conventional column of mercury, Pa/m
	water    = 1000.0 * gravity  // conventional column of water, Pa/m
	btu      = 1055.05585262     // International Table
)

// Dimensions used in more than one row.
var (
	dimNone   = unit.Dimensions{}
	dimLength = unit.Dimensions{unit.LengthDim: 1}
	dimVolume = unit.Dimensions{unit.LengthDim: 3}
	dimMass   = unit.Dimensions{unit.MassDim: 1}
	dimTime   = unit.Dimensions{unit.TimeDim: 1}
	dimAngle  = unit.Dimensions{unit.AngleDim: 1}
	dimCycles = unit.Dimensions{unit.AngleDim: 1, unit.TimeDim: -1}
	dimRate   = unit.Dimensions{unit.TimeDim: -1}
	dimDose   = unit.Dimensions{unit.LengthDim: 2, unit.TimeDim: -2}
	dimSpeed  = unit.Dimensions{unit.LengthDim: 1, unit.TimeDim: -1}
	dimAccel  = unit.Dimensions{unit.LengthDim: 1, unit.TimeDim: -2}
	dimFlow   = unit.Dimensions{unit.LengthDim: 3, unit.TimeDim: -1}
	dimForce  = unit.Dimensions{unit.MassDim: 1, unit.LengthDim: 1, unit.TimeDim: -2}
	dimStress = unit.Dimensions{unit.MassDim: 1, unit.LengthDim: -1, unit.TimeDim: -2}
	dimEnergy = unit.Dimensions{unit.MassDim: 1, unit.LengthDim: 2, unit.TimeDim: -2}
	dimPower  = unit.Dimensions{unit.MassDim: 1, unit.LengthDim: 2, unit.TimeDim: -3}
	dimTemp   = unit.Dimensions{unit.TemperatureDim: 1}
	dimLumen  = unit.Dimensions{unit.LuminousIntensityDim: 1, unit.AngleDim: 2}
)

// electric are the dimensions of the units derived from the ampere.
func electric(mass, length, time, current int) unit.Dimensions {
	return unit.Dimensions{unit.MassDim: mass, unit.LengthDim: length, unit.TimeDim: time, unit.CurrentDim: current}
}

func of(value float64, d unit.Dimensions) term { return term{u: unit.New(value, d)} }
func ten(dec int, value float64, d unit.Dimensions) term {
	return term{u: unit.New(value, d), dec: dec}
}
func turn(value float64, d unit.Dimensions) term { return term{u: unit.New(value, d), turns: 1} }

// table is the list of units. Order is that of a catalogue: by what they measure.
var table = []entry{
	{symbol: "1", name: "one", term: of(1, dimNone), source: brochure},
	{symbol: "%", name: "per cent", term: ten(-2, 1, dimNone), source: brochure},
	{symbol: "‰", name: "per mille", term: ten(-3, 1, dimNone), source: brochure},
	{symbol: "ppm", name: "parts per million", term: ten(-6, 1, dimNone), source: sp811},
	{symbol: "psu", name: "practical salinity", term: ten(-3, 1, dimNone), mark: saline, source: unesco},
	{symbol: "ppt", name: "parts per thousand of salt", term: ten(-3, 1, dimNone), mark: saline, source: unesco},

	{symbol: "m", name: "metre", term: of(1, dimLength), prefixable: true, source: brochure},
	{symbol: "in", name: "inch", term: of(inch, dimLength), source: sp811},
	{symbol: "ft", name: "foot", term: of(foot, dimLength), source: sp811},
	{symbol: "yd", name: "yard", term: of(yard, dimLength), source: sp811},
	{symbol: "mi", name: "mile", term: of(mile, dimLength), source: sp811},
	{symbol: "nmi", name: "nautical mile", term: of(nautical, dimLength), source: sp811},
	{symbol: "mil", aliases: []string{"thou"}, name: "thousandth of an inch", term: ten(-3, inch, dimLength), source: sp811},

	{symbol: "L", aliases: []string{"l"}, name: "litre", term: ten(-3, 1, dimVolume), prefixable: true, source: brochure},
	{symbol: "gal", name: "gallon (US)", term: of(gallon, dimVolume), source: sp811},

	{symbol: "kg", name: "kilogram", term: of(1, dimMass), source: brochure},
	{symbol: "g", name: "gram", term: ten(-3, 1, dimMass), prefixable: true, source: brochure},
	{symbol: "t", name: "tonne", term: ten(3, 1, dimMass), source: brochure},
	{symbol: "lbm", name: "pound (mass)", term: of(pound, dimMass), source: sp811},
	{symbol: "slug", name: "slug", term: of(force/foot, dimMass), source: sp811},
	{symbol: "slinch", name: "slinch", term: of(force/inch, dimMass), source: inchDef},

	{symbol: "s", name: "second", term: of(1, dimTime), prefixable: true, source: brochure},
	{symbol: "min", name: "minute", term: of(60, dimTime), source: brochure},
	{symbol: "h", name: "hour", term: of(3600, dimTime), source: brochure},
	{symbol: "d", name: "day", term: of(86400, dimTime), source: brochure},

	{symbol: "rad", name: "radian", term: of(1, dimAngle), prefixable: true, source: brochure},
	{symbol: "deg", aliases: []string{"°"}, name: "degree of angle", term: turn(1.0/360, dimAngle), source: brochure},
	{symbol: "cycle", aliases: []string{"cycles", "rev", "turn"}, name: "cycle", term: turn(1, dimAngle), source: sp811},
	{symbol: "sr", name: "steradian", term: of(1, unit.Dimensions{unit.AngleDim: 2}), source: brochure},
	{symbol: "Hz", name: "hertz", term: turn(1, dimCycles), prefixable: true, source: brochure},
	{symbol: "rpm", name: "revolution per minute", term: turn(1.0/60, dimCycles), source: sp811},
	{symbol: "cpm", name: "cycle per minute", term: turn(1.0/60, dimCycles), source: sp811},

	{symbol: "kn", aliases: []string{"knot", "knots"}, name: "knot", term: of(nautical/3600, dimSpeed), source: sp811},
	{symbol: "mph", name: "mile per hour", term: of(mile/3600, dimSpeed), source: sp811},
	{symbol: "g0", aliases: []string{"gn"}, name: "standard acceleration of free fall", term: of(gravity, dimAccel), source: sp811},
	{symbol: "gpm", name: "gallon (US) per minute", term: of(gallon/60, dimFlow), source: sp811},
	{symbol: "cfm", name: "cubic foot per minute", term: of(foot*foot*foot/60, dimFlow), source: sp811},

	{symbol: "N", name: "newton", term: of(1, dimForce), prefixable: true, source: brochure},
	{symbol: "dyn", name: "dyne", term: ten(-5, 1, dimForce), source: sp811},
	{symbol: "kgf", aliases: []string{"kp"}, name: "kilogram-force", term: of(gravity, dimForce), source: sp811},
	{symbol: "lbf", name: "pound-force", term: of(force, dimForce), source: sp811},
	{symbol: "kip", name: "thousand pound-force", term: ten(3, force, dimForce), source: sp811},

	{symbol: "Pa", name: "pascal", term: of(1, dimStress), prefixable: true, source: brochure},
	{symbol: "Paa", name: "pascal absolute", term: of(1, dimStress), prefixable: true, mark: absolute, source: practice},
	{symbol: "Pag", name: "pascal gauge", term: of(1, dimStress), prefixable: true, mark: gauge, source: practice},
	{symbol: "bar", name: "bar", term: ten(5, 1, dimStress), prefixable: true, source: brochure},
	{symbol: "bara", name: "bar absolute", term: ten(5, 1, dimStress), prefixable: true, mark: absolute, source: practice},
	{symbol: "barg", name: "bar gauge", term: ten(5, 1, dimStress), prefixable: true, mark: gauge, source: practice},
	{symbol: "atm", name: "standard atmosphere", term: of(101325, dimStress), source: sp811},
	{symbol: "Torr", name: "torr", term: of(101325.0/760, dimStress), prefixable: true, source: sp811},
	{symbol: "psi", name: "pound-force per square inch", term: of(psi, dimStress), source: sp811},
	{symbol: "psia", name: "pound-force per square inch absolute", term: of(psi, dimStress), mark: absolute, source: practice},
	{symbol: "psig", name: "pound-force per square inch gauge", term: of(psi, dimStress), mark: gauge, source: practice},
	{symbol: "psf", name: "pound-force per square foot", term: of(force/(foot*foot), dimStress), source: sp811},
	{symbol: "ksi", name: "thousand pound-force per square inch", term: ten(3, psi, dimStress), source: sp811},
	{symbol: "mmHg", name: "millimetre of mercury, conventional", term: ten(-3, mercury, dimStress), source: sp811},
	{symbol: "inHg", name: "inch of mercury, conventional", term: of(inch*mercury, dimStress), source: sp811},
	{symbol: "mmH2O", name: "millimetre of water, conventional", term: ten(-3, water, dimStress), source: sp811},
	{symbol: "inH2O", name: "inch of water, conventional", term: of(inch*water, dimStress), source: sp811},
	{symbol: "ftH2O", name: "foot of water, conventional", term: of(foot*water, dimStress), source: sp811},

	{symbol: "P", name: "poise", term: ten(-1, 1, unit.Dimensions{unit.MassDim: 1, unit.LengthDim: -1, unit.TimeDim: -1}), prefixable: true, source: sp811},
	{symbol: "St", name: "stokes", term: ten(-4, 1, unit.Dimensions{unit.LengthDim: 2, unit.TimeDim: -1}), prefixable: true, source: sp811},

	{symbol: "J", name: "joule", term: of(1, dimEnergy), prefixable: true, source: brochure},
	{symbol: "erg", name: "erg", term: ten(-7, 1, dimEnergy), source: sp811},
	{symbol: "cal", name: "calorie, thermochemical", term: of(4.184, dimEnergy), prefixable: true, source: sp811},
	{symbol: "Btu", aliases: []string{"BTU"}, name: "British thermal unit, International Table", term: of(btu, dimEnergy), source: sp811},
	{symbol: "W", name: "watt", term: of(1, dimPower), prefixable: true, source: brochure},
	{symbol: "hp", name: "horsepower, 550 ft lbf/s", term: of(550*foot*force, dimPower), source: sp811},

	{symbol: "K", name: "kelvin", term: of(1, dimTemp), prefixable: true, source: brochure},
	{symbol: "degC", aliases: []string{"°C", "℃"}, name: "degree Celsius", term: of(1, dimTemp), offset: 273.15, source: brochure},
	{symbol: "degF", aliases: []string{"°F", "℉"}, name: "degree Fahrenheit", term: of(5.0/9, dimTemp), offset: 459.67, source: sp811},
	{symbol: "degR", aliases: []string{"°R"}, name: "degree Rankine", term: of(5.0/9, dimTemp), source: sp811},

	{symbol: "A", name: "ampere", term: of(1, electric(0, 0, 0, 1)), prefixable: true, source: brochure},
	{symbol: "C", name: "coulomb", term: of(1, electric(0, 0, 1, 1)), prefixable: true, source: brochure},
	{symbol: "V", name: "volt", term: of(1, electric(1, 2, -3, -1)), prefixable: true, source: brochure},
	{symbol: "ohm", aliases: []string{"Ω", "\u2126"}, name: "ohm", term: of(1, electric(1, 2, -3, -2)), prefixable: true, source: brochure},
	{symbol: "S", name: "siemens", term: of(1, electric(-1, -2, 3, 2)), prefixable: true, source: brochure},
	{symbol: "F", name: "farad", term: of(1, electric(-1, -2, 4, 2)), prefixable: true, source: brochure},
	{symbol: "H", name: "henry", term: of(1, electric(1, 2, -2, -2)), prefixable: true, source: brochure},
	{symbol: "Wb", name: "weber", term: of(1, electric(1, 2, -2, -1)), prefixable: true, source: brochure},
	{symbol: "T", name: "tesla", term: of(1, electric(1, 0, -2, -1)), prefixable: true, source: brochure},

	{symbol: "mol", name: "mole", term: of(1, unit.Dimensions{unit.MoleDim: 1}), prefixable: true, source: brochure},
	{symbol: "kat", name: "katal", term: of(1, unit.Dimensions{unit.MoleDim: 1, unit.TimeDim: -1}), prefixable: true, source: brochure},
	{symbol: "cd", name: "candela", term: of(1, unit.Dimensions{unit.LuminousIntensityDim: 1}), prefixable: true, source: brochure},
	{symbol: "lm", name: "lumen", term: of(1, dimLumen), prefixable: true, source: brochure},
	{symbol: "lx", name: "lux", term: of(1, unit.Dimensions{unit.LuminousIntensityDim: 1, unit.AngleDim: 2, unit.LengthDim: -2}), prefixable: true, source: brochure},
	{symbol: "Bq", name: "becquerel", term: of(1, dimRate), prefixable: true, source: brochure},
	{symbol: "Gy", name: "gray", term: of(1, dimDose), prefixable: true, source: brochure},
	{symbol: "Sv", name: "sievert", term: of(1, dimDose), prefixable: true, source: brochure},
}

// prefix is an SI prefix.
type prefix struct {
	symbol string
	dec    int
}

// prefixes in the order in which a symbol is tried: da before d. SI Brochure,
// 9th edition (2019), table 7, with the prefixes of 2022 (from memory); micro
// is accepted as the micro sign, as the Greek letter and as u.
var prefixes = []prefix{
	{"da", 1},
	{"k", 3}, {"M", 6}, {"G", 9}, {"T", 12}, {"P", 15}, {"E", 18}, {"Z", 21}, {"Y", 24}, {"R", 27}, {"Q", 30}, {"h", 2},
	{"d", -1}, {"c", -2}, {"m", -3}, {"\u00b5", -6}, {"\u03bc", -6}, {"u", -6}, {"n", -9}, {"p", -12},
	{"f", -15}, {"a", -18}, {"z", -21}, {"y", -24}, {"r", -27}, {"q", -30},
}

// bySymbol finds a row by its symbol or by an alias.
var bySymbol = index()

func index() map[string]*entry {
	m := make(map[string]*entry, 2*len(table))
	for i := range table {
		e := &table[i]
		m[e.symbol] = e
		for _, a := range e.aliases {
			m[a] = e
		}
	}
	return m
}

// lookup finds a unit symbol, with or without a prefix. The second result is the
// power of ten of the prefix.
func lookup(symbol string) (e *entry, dec int, ok bool) {
	if e, ok := bySymbol[symbol]; ok {
		return e, 0, true
	}
	for _, p := range prefixes {
		rest, found := strings.CutPrefix(symbol, p.symbol)
		if !found {
			continue
		}
		if e, ok := bySymbol[rest]; ok && e.prefixable {
			return e, p.dec, true
		}
	}
	return nil, 0, false
}

// symbols lists everything that can be written for one unit: rows, aliases,
// and then the prefixed forms.
func symbols() []string {
	var plain, prefixed []string
	for i := range table {
		e := &table[i]
		names := append([]string{e.symbol}, e.aliases...)
		plain = append(plain, names...)
		if !e.prefixable {
			continue
		}
		for _, p := range prefixes {
			for _, n := range names {
				prefixed = append(prefixed, p.symbol+n)
			}
		}
	}
	return append(plain, prefixed...)
}

// UnitInfo is a row of the catalogue of units: a number x of the unit is
// (x + Offset)·Factor in the unit SI.
type UnitInfo struct {
	Symbol     string
	Aliases    []string
	Name       string
	SI         string
	Factor     float64
	Offset     float64
	Prefixable bool
	Source     string
}

// Table lists the units in the order of the catalogue.
func Table() []UnitInfo {
	list := make([]UnitInfo, len(table))
	for i := range table {
		e := &table[i]
		list[i] = UnitInfo{
			Symbol: e.symbol, Aliases: slices.Clone(e.aliases), Name: e.name,
			SI: siForm(e.term.u), Factor: e.term.factor(), Offset: e.offset,
			Prefixable: e.prefixable, Source: e.source,
		}
	}
	return list
}

// factor is the whole value of the term in coherent SI units.
func (t term) factor() float64 {
	s := t.scale()
	return s.mul / s.div
}

// scale is the value of a term as a multiplier and a divisor. A divisor is used
// where the reciprocal of the factor is the round number: 12.5/1000 is rounded
// once, 12.5·0.001 twice.
type scale struct{ mul, div float64 }

func (t term) scale() scale {
	value := t.u.Value() * math.Pow(2*math.Pi, float64(t.turns))
	if t.dec >= 0 {
		return scale{value * math.Pow10(t.dec), 1}.tidy()
	}
	return scale{value, math.Pow10(-t.dec)}.tidy()
}

// tidy turns a multiplier that is the rounded reciprocal of a whole number into a
// division by that number.
func (s scale) tidy() scale {
	const exact = 1 << 53
	n := math.Round(1 / s.mul)
	if s.mul < 1 && n < exact && n*s.div < exact && 1/n == s.mul {
		return scale{1, n * s.div}
	}
	return s
}

// sound says whether the scale can be applied at all: a heap of prefixes may
// leave the range of a double.
func (s scale) sound() bool {
	const tiny = 0x1p-1022
	f := s.mul / s.div
	return s.mul >= tiny && s.div < math.Inf(1) && f >= tiny && f < math.Inf(1)
}

// siOrder is the order of the base units in an SI expression.
var siOrder = []unit.Dimension{
	unit.MassDim, unit.LengthDim, unit.TimeDim, unit.CurrentDim, unit.TemperatureDim,
	unit.MoleDim, unit.LuminousIntensityDim, unit.AngleDim,
}

// siForm writes the dimension of u in base units: "kg/(m s2)", "1".
func siForm(u *unit.Unit) string {
	d := u.Dimensions()
	var over, under []string
	for _, dim := range siOrder {
		switch n := d[dim]; {
		case n > 0:
			over = append(over, power(dim, n))
		case n < 0:
			under = append(under, power(dim, -n))
		}
	}
	top := "1"
	if len(over) > 0 {
		top = strings.Join(over, " ")
	}
	switch len(under) {
	case 0:
		return top
	case 1:
		return top + "/" + under[0]
	}
	return top + "/(" + strings.Join(under, " ") + ")"
}

func power(dim unit.Dimension, n int) string {
	if n == 1 {
		return dim.String()
	}
	return dim.String() + strconv.Itoa(n)
}

// symbolRune says whether r can be part of a unit symbol that has several letters.
func symbolRune(r rune) bool {
	if r < utf8.RuneSelf {
		return 'a' <= r && r <= 'z' || 'A' <= r && r <= 'Z' || '0' <= r && r <= '9' || r == '_'
	}
	return unicode.IsLetter(r) || r == '°' || r == '℃' || r == '℉'
}
