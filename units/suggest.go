package units

import (
	"slices"
	"strings"
	"sync"
	"unicode"

	"gonum.org/v1/gonum/unit"
)

const either = " or "

// longestGuess is the length up to which an unknown symbol is compared with the
// known ones letter by letter: those are all shorter.
const longestGuess = 12

// confusions are symbols that are written often and are no unit here, with what
// was probably meant. An entry in words is said as it stands; an entry of unit
// expressions is put into the place of the symbol.
var confusions = map[string][]string{
	"kph": {"km/h"}, "kmh": {"km/h"}, "kmph": {"km/h"}, "mps": {"m/s"}, "fps": {"ft/s"}, "kts": {"kn"}, "kt": {"kn"},
	"sec": {"s"}, "secs": {"s"}, "hr": {"h"}, "hrs": {"h"}, "mins": {"min"},
	"feet": {"ft"}, "foot": {"ft"}, "inches": {"in"}, "micron": {"um"}, "microns": {"um"},
	"cc": {"cm3"}, "ccm": {"cm3"}, "sqm": {"m2"}, "cbm": {"m3"}, "sqft": {"ft2"},
	"cps": {"Hz"}, "mb": {"mbar"}, "kgs": {"kg"}, "kilo": {"kg"}, "ton": {"t"}, "tons": {"t"}, "tonne": {"t"},
	"amp": {"A"}, "amps": {"A"}, "deg_c": {"degC"}, "deg_f": {"degF"}, "celsius": {"degC"}, "centigrade": {"degC"}, "fahrenheit": {"degF"},
	"degk": {"K"}, "degs": {"deg"}, "degree": {"deg"}, "degrees": {"deg"}, "radians": {"rad"},
	"permille": {"‰"}, "percent": {"%"}, "pct": {"%"},
}

// poundWords are refused whatever the kind: a pound is a mass or a force.
var poundWords = []string{"lb", "lbs", "pound", "pounds"}

const whichPound = "lbm (mass)" + either + "lbf (force)"

// swaps are units whose number is right and whose kind is not: a weight for a
// mass, a letter that stands for another unit.
var swaps = map[string][]string{
	"lbf": {"lbm"}, "lbm": {"lbf"}, "kgf": {"kg"}, "kp": {"kg"}, "kg": {"kgf"},
	"C": {"degC"}, "F": {"degF"}, "R": {"degR"}, "deg": {"degC", "degF"}, "°": {"°C", "°F"}, "g": {"g0"},
}

// allSymbols is what can be written for one unit, with and without prefixes.
var allSymbols = sync.OnceValue(symbols)

// substitute puts instead into the place src[start:end], in parentheses where
// the result would otherwise mean something else.
func substitute(src string, start, end int, instead string) string {
	if (start > 0 || end < len(src)) && strings.ContainsAny(instead, " /") {
		instead = "(" + instead + ")"
	}
	return src[:start] + instead + src[end:]
}

// explain turns the fault of the expression src into an error about a quantity
// of kind k that was received as got.
func explain(f *fault, src, got string, k Kind) *Error {
	e := newError(f.code, got, k, f.detail)
	switch f.code {
	case CodeUnknownUnit:
		symbol := src[f.start:f.end]
		if slices.Contains(poundWords, strings.ToLower(symbol)) {
			e.Code, e.Detail = CodeAmbiguousUnit, symbol+" may be a mass or a force"
			return e.suggest(whichPound)
		}
		return e.suggest(meant(src, f.start, f.end, k))
	case CodeAmbiguousUnit:
		return e.suggest(strings.Join(preferred(f.readings, k), either))
	}
	return e
}

// preferred keeps the expressions that have the meaning of the kind, or if none
// has, those that can be read at all.
func preferred(expressions []string, k Kind) []string {
	if good := fitting(expressions, k); len(good) > 0 {
		return good
	}
	var readable []string
	for _, x := range expressions {
		if _, f := read(x); f == nil {
			readable = append(readable, x)
		}
	}
	return readable
}

// fitting keeps the expressions that have the meaning of the kind. Guesses are
// read without the cache, which is for what callers write.
func fitting(expressions []string, k Kind) []string {
	var good []string
	for _, x := range expressions {
		if c, f := read(x); f == nil && c.fits(k) && !slices.Contains(good, x) {
			good = append(good, x)
		}
	}
	return good
}

// meant guesses what was meant where src[start:end] is an unknown symbol. It may
// find nothing, and then returns an empty string. Guesses that make the
// expression fit the kind go before those that are only near in spelling.
func meant(src string, start, end int, k Kind) string {
	symbol := src[start:end]
	place := func(candidates []string) []string {
		whole := make([]string, len(candidates))
		for i, c := range candidates {
			whole[i] = substitute(src, start, end, c)
		}
		return whole
	}
	if known, ok := confusions[strings.ToLower(symbol)]; ok {
		return few(preferred(place(known), k))
	}
	same, named := place(sameLetters(symbol)), place(byName(symbol))
	for _, guesses := range [][]string{{strings.ToLower(src)}, same, named, place(splits(symbol)), {closedUp(src)}} {
		if good := fitting(guesses, k); len(good) > 0 {
			return few(good)
		}
	}
	if len(named) > 0 {
		return furtherMeant(named[0], k)
	}
	if len(same) > 0 {
		return furtherMeant(same[0], k)
	}
	return nearest(src, start, end, k)
}

// furtherMeant goes on with an expression in which one symbol has been put
// right: the next one may be unknown too (meters per second). Every round leaves
// one unknown symbol less, so it ends.
func furtherMeant(src string, k Kind) string {
	_, f := read(src)
	switch {
	case f == nil:
		return src
	case f.code == CodeUnknownUnit:
		return meant(src, f.start, f.end, k)
	}
	return ""
}

// closedUp is the expression without spaces and parentheses: mm Hg, bar(g), ° C.
func closedUp(src string) string {
	return strings.Map(func(r rune) rune {
		if r == '(' || r == ')' || unicode.IsSpace(r) {
			return -1
		}
		return r
	}, src)
}

// few joins at most two suggestions.
func few(list []string) string {
	return strings.Join(list[:min(len(list), 2)], either)
}

// sameLetters lists the symbols that differ from s in the case of letters only,
// those with the fewest differences.
func sameLetters(s string) []string {
	var best []string
	least := len(s) + 1
	for _, c := range folded()[strings.ToLower(s)] {
		switch d := differences(c, s); {
		case d == 0:
		case d < least:
			least, best = d, []string{c}
		case d == least:
			best = append(best, c)
		}
	}
	return best
}

// folded finds symbols by their letters in lower case.
var folded = sync.OnceValue(func() map[string][]string {
	m := make(map[string][]string)
	for _, s := range allSymbols() {
		lower := strings.ToLower(s)
		m[lower] = append(m[lower], s)
	}
	return m
})

// differences counts the letters in which two texts that are equal but for case differ.
func differences(a, b string) int {
	x, y := []rune(a), []rune(b)
	n := 0
	for i := range min(len(x), len(y)) {
		if x[i] != y[i] {
			n++
		}
	}
	return n
}

// byName finds the symbol of a unit that was written out: meter, pascals.
func byName(s string) []string {
	s = strings.ToLower(s)
	if len(s) < 3 {
		return nil
	}
	for i := range table {
		name := table[i].name
		for _, n := range []string{name, strings.Replace(name, "tre", "ter", 1)} {
			if s == n || s == n+"s" {
				return []string{table[i].symbol}
			}
		}
	}
	return nil
}

// splits lists the products of two known symbols that run together to s, the
// case of letters aside: Nm, mpas.
func splits(s string) []string {
	var list []string
	if len(s) > longestGuess {
		return nil
	}
	for i := range s {
		if i == 0 {
			continue
		}
		for _, left := range spellings(s[:i]) {
			for _, right := range spellings(s[i:]) {
				list = append(list, left+" "+right)
			}
		}
	}
	return list
}

// spellings lists s itself, if it is a symbol, and those that differ in case.
func spellings(s string) []string {
	same := sameLetters(s)
	if _, _, ok := lookup(s); ok {
		return append([]string{s}, same...)
	}
	return same
}

// nearest is the expression with the unknown symbol replaced by the known one
// at the smallest edit distance, of those with which it fits the kind.
func nearest(src string, start, end int, k Kind) string {
	symbol := src[start:end]
	limit := 1
	if len(symbol) > 3 {
		limit = 2
	}
	if len(symbol) < 2 || len(symbol) > longestGuess {
		return ""
	}
	best := ""
	for _, s := range allSymbols() {
		d := distance(symbol, s, limit)
		if d > limit {
			continue
		}
		whole := substitute(src, start, end, s)
		if len(fitting([]string{whole}, k)) > 0 {
			best, limit = whole, d-1
		}
	}
	return best
}

// distance is the number of insertions, deletions, replacements and exchanges of
// neighbours that turn a into b; above the limit any larger number. Symbols are
// short, so rows of fixed length do.
func distance(a, b string, limit int) int {
	const longest = longestGuess + 2
	if d := len(a) - len(b); d > limit || -d > limit || len(b) >= longest || len(a) >= longest {
		return limit + 1
	}
	var before, last, row [longest + 1]int
	for j := range len(b) + 1 {
		last[j] = j
	}
	for i := 1; i <= len(a); i++ {
		row[0] = i
		for j := 1; j <= len(b); j++ {
			cost := 1
			if a[i-1] == b[j-1] {
				cost = 0
			}
			row[j] = min(last[j]+1, row[j-1]+1, last[j-1]+cost)
			if i > 1 && j > 1 && a[i-1] == b[j-2] && a[i-2] == b[j-1] {
				row[j] = min(row[j], before[j-2]+1)
			}
		}
		before, last = last, row
	}
	return last[len(b)]
}

// misfit explains why the unit c is none of kind k.
func misfit(c *compiled, got string, k Kind) *Error {
	wrongKind := func(detail, suggestion string) *Error {
		return newError(CodeWrongKind, got, k, detail).suggest(suggestion)
	}
	switch {
	case c.sameDimension(k):
		return wrongKind(unmarked(c, k))
	case k == Frequency && unit.DimensionsMatch(c.u, perSecond):
		return wrongKind(c.text+" does not say whether it counts cycles or radians", "Hz"+either+"rad/s")
	case k == DynamicViscosity && c.fits(KinematicViscosity):
		return wrongKind(c.text+" is the unit of a kinematic viscosity, and the dynamic one is wanted", "kinematic_viscosity")
	case k == KinematicViscosity && c.fits(DynamicViscosity):
		return wrongKind(c.text+" is the unit of a dynamic viscosity, and the kinematic one is wanted", "viscosity")
	}
	e := newError(CodeWrongDimension, got, k, c.text+" is the unit of "+describe(c.u)+", not of "+k.info().phrase)
	return e.suggest(repaired(c.text, k))
}

// unmarked says why a suffix does not go with the kind, and what does.
func unmarked(c *compiled, k Kind) (detail, suggestion string) {
	switch {
	case c.mark == saline:
		return c.text + " is the unit of a salinity only", "g/kg"
	case c.mark == absolute && (k == GaugePressure || k == PressureDifference):
		base := c.text[:len(c.text)-1]
		return c.text + " counts from vacuum, and " + k.info().phrase + " does not", base + either + base + "g"
	}
	return c.text + " is a pressure with a reference, and " + k.info().phrase + " has none", c.text[:len(c.text)-1]
}

// repaired looks for an expression of the right meaning that differs from src by
// one unit that is easily confused.
func repaired(src string, k Kind) string {
	var found []string
	p := parser{src: src}
	for p.pos < len(src) {
		start := p.pos
		run := strings.TrimRight(p.run(), "0123456789")
		if run == "" {
			_, size := p.peek()
			p.pos = max(p.pos, start) + size
			continue
		}
		for _, s := range slices.Concat(swaps[run], sameLetters(run)) {
			found = append(found, substitute(src, start, start+len(run), s))
		}
	}
	found = append(found, strings.ToLower(src), closedUp(src))
	return few(fitting(found, k))
}

// otherDimensions are meanings that are no kind of their own.
var otherDimensions = []struct {
	phrase string
	u      *unit.Unit
}{
	{"a pressure or an elastic modulus", mlt(1, -1, -2)},
	{"a stiffness or a force per length", mlt(1, 0, -2)},
	{"a moment or an energy", mlt(1, 2, -2)},
	{"a power", mlt(1, 2, -3)},
	{"a volume flow", mlt(0, 3, -1)},
	{"a mass flow", mlt(1, 0, -1)},
	{"a rate", perSecond},
	{"an electric current", current(0, 0, 0, 1)},
	{"a voltage", current(1, 2, -3, -1)},
	{"an electric charge", current(0, 0, 1, 1)},
	{"a magnetic flux density", current(1, 0, -2, -1)},
}

// describe says in words what the dimension of u is.
func describe(u *unit.Unit) string {
	for _, o := range otherDimensions {
		if unit.DimensionsMatch(u, o.u) {
			return o.phrase
		}
	}
	for _, k := range Kinds() {
		if k.matches(u) {
			return k.info().phrase
		}
	}
	return "a quantity in " + siForm(u)
}
