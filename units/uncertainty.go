package units

import "strings"

// Object is a quantity whose parts came separately: a value with or without a
// standard deviation, absolute or in per cent, or the two ends of a range.
type Object struct {
	Value   *float64
	Std     *float64 // one standard deviation, in the unit
	Percent *float64 // one standard deviation, in per cent of the value
	Low     *float64
	High    *float64
	Unit    string
}

// FromObject is the quantity of kind k that an object describes.
func FromObject(o Object, k Kind) (Quantity, error) {
	return result(fromObject(o, k))
}

func fromObject(o Object, k Kind) (Quantity, *Error) {
	text := strings.TrimSpace(o.Unit)
	if len(text) > maxText {
		return Quantity{}, newError(CodeSyntax, text, k, "too long for a unit")
	}
	if o.Low != nil && o.High != nil && o.Value == nil && o.Std == nil && o.Percent == nil {
		return between(measure{x: *o.Low, unit: text}, measure{x: *o.High, unit: text}, k, "")
	}
	if o.Value == nil || o.Low != nil || o.High != nil || o.Std != nil && o.Percent != nil {
		return Quantity{}, newError(CodeSyntax, text, k,
			"a quantity has either a value, with or without one standard deviation, or a lower and an upper end")
	}
	mean := measure{x: *o.Value, unit: text}
	switch {
	case o.Std != nil:
		return around(mean, measure{x: *o.Std, unit: text}, k, "")
	case o.Percent != nil:
		return relative(mean, *o.Percent, k, "")
	}
	return measured(mean.x, mean.unit, k, "")
}

// marks separate a value from its standard deviation, and the ends of a range.
// Longer ones stand first.
var marks = []struct {
	text   string
	ranged bool
}{
	{"+/-", false}, {"+-", false}, {"±", false}, {"...", true}, {"..", true}, {"…", true},
}

// hasMark says whether s may contain a mark. It is on the path of every
// quantity, and may be wrong about a plus sign.
func hasMark(s string) bool {
	for i := 0; i < len(s); i++ {
		switch s[i] {
		case '+', 0xC2, 0xE2: // 0xC2 begins ±, 0xE2 begins …
			if _, _, _, ok := split(s[i:]); ok {
				return true
			}
		case '.':
			if i+1 < len(s) && s[i+1] == '.' {
				return true
			}
		}
	}
	return false
}

// split cuts s at its first mark.
func split(s string) (left, right string, ranged, ok bool) {
	at := len(s)
	var width int
	for _, m := range marks {
		if i := strings.Index(s, m.text); i >= 0 && i < at {
			at, width, ranged, ok = i, len(m.text), m.ranged, true
		}
	}
	if !ok {
		return s, "", false, false
	}
	left, right = strings.TrimSpace(s[:at]), s[at+width:]
	if ranged && strings.HasPrefix(right, ".") {
		return left, "", ranged, true // 1....2 is not 1 .. 0.2
	}
	return left, strings.TrimSpace(right), ranged, true
}

// measure is a number with the unit expression that follows it.
type measure struct {
	x      float64
	digits string // as written
	unit   string
}

// uncertain reads a quantity that has a mark or begins with a parenthesis.
func uncertain(text string, k Kind) (Quantity, *Error) {
	inner, outer, grouped := group(text)
	left, right, ranged, ok := split(inner)
	if !ok {
		return Quantity{}, newError(CodeSyntax, text, k, "there is no number with a standard deviation or a range in the parentheses")
	}
	a, e := measureOf(left, text, k)
	if e != nil {
		return Quantity{}, e
	}
	b, e := measureOf(right, text, k)
	if e != nil {
		return Quantity{}, e
	}
	if grouped {
		return within(a, b, outer, ranged, k, text)
	}
	return open(a, b, ranged, k, text)
}

// group takes (inner) outer apart.
func group(text string) (inner, outer string, ok bool) {
	if text[0] != '(' {
		return text, "", false
	}
	end := strings.IndexByte(text, ')')
	if end < 0 {
		return text[1:], "", true
	}
	return text[1:end], strings.TrimSpace(text[end+1:]), true
}

func measureOf(s, got string, k Kind) (measure, *Error) {
	n := number(s)
	if n == 0 {
		return measure{}, noNumber(s, got, k)
	}
	x, e := value(s[:n], got, k)
	if e != nil {
		return measure{}, e
	}
	return measure{x, s[:n], strings.TrimSpace(s[n:])}, nil
}

// within reads (a ± b) unit, (a ± b %) unit and (a .. b) unit.
func within(a, b measure, outer string, ranged bool, k Kind, got string) (Quantity, *Error) {
	percent := !ranged && b.unit == "%"
	if a.unit != "" || b.unit != "" && !percent {
		return Quantity{}, newError(CodeSyntax, got, k, "the unit stands after the parentheses")
	}
	a.unit = outer
	if percent {
		return relative(a, b.x, k, got)
	}
	b.unit = outer
	if ranged {
		return between(a, b, k, got)
	}
	return around(a, b, k, got)
}

// open reads the forms without parentheses.
func open(a, b measure, ranged bool, k Kind, got string) (Quantity, *Error) {
	switch {
	case !ranged && strings.HasPrefix(b.unit, "%"):
		return percentage(a, b, k, got)
	case a.unit == "":
		a.unit = b.unit
	case b.unit == "":
		return Quantity{}, lacking(a, b, ranged, k, got)
	}
	if ranged {
		return between(a, b, k, got)
	}
	return around(a, b, k, got)
}

// lacking is the error of 2.1 m/s +- 0.2, which might be metres per second or a
// fraction.
func lacking(a, b measure, ranged bool, k Kind, got string) *Error {
	e := newError(CodeMissingUnit, got, k, "the second number has no unit")
	if ranged {
		return e.suggest(clip(a.digits + " .. " + b.digits + " " + a.unit))
	}
	return e.suggest(clip(a.digits + " " + a.unit + " +- " + b.digits + " " + a.unit))
}

// percentage reads the forms in which the standard deviation is followed by %.
func percentage(a, b measure, k Kind, got string) (Quantity, *Error) {
	rest := strings.TrimSpace(b.unit[1:])
	if rest != "" {
		// 2.1 +- 10 % m/s: the sign of per cent would make a unit of a hundredth.
		e := newError(CodeSyntax, got, k, "the unit stands with the value, not after the per cent")
		if a.unit == "" {
			e = e.suggest(clip(a.digits + " " + rest + " +- " + b.digits + " %"))
		}
		return Quantity{}, e
	}
	if a.unit == "%" {
		e := newError(CodeAmbiguousUnit, got, k, "per cent of the value, or of the whole")
		return Quantity{}, e.suggest("(" + a.digits + " +- " + b.digits + ") %" + either + "(" + a.digits + " +- " + b.digits + " %) %")
	}
	return relative(a, b.x, k, got)
}

// relative is a value with a standard deviation in per cent of it.
func relative(a measure, percent float64, k Kind, got string) (Quantity, *Error) {
	q, e := measured(a.x, a.unit, k, got)
	if e != nil {
		return Quantity{}, e
	}
	if a.unit != "" && k == Temperature {
		if c, f := compile(a.unit); f == nil && c.offset != 0 {
			d := newError(CodeSyntax, received(got, a.x, a.unit), k, "a percentage of a temperature that does not count from absolute zero has no meaning")
			d.Want = "a standard deviation in K, such as 20 degC +- 2 K"
			return Quantity{}, d
		}
	}
	size := q.Value
	if size < 0 {
		size = -size
	}
	return q.spread(Normal, size*(percent/100), percent < 0, k, received(got, a.x, a.unit))
}

// around is a value with a standard deviation. Each has a unit of its own; of
// that of the deviation only the scale counts.
func around(a, b measure, k Kind, got string) (Quantity, *Error) {
	q, e := measured(a.x, a.unit, k, got)
	if e != nil {
		return Quantity{}, e
	}
	width := b.x
	if b.unit != "" {
		c, e := scaleOf(b, k, got)
		if e != nil {
			return Quantity{}, e
		}
		width = c.difference(b.x, k)
	}
	return q.spread(Normal, width, b.x < 0, k, received(got, a.x, a.unit))
}

// scaleOf is the unit of a standard deviation: the dimension of the kind will do.
func scaleOf(b measure, k Kind, got string) (*compiled, *Error) {
	c, f := compile(b.unit)
	if f != nil {
		return nil, explain(f, b.unit, received(got, b.x, b.unit), k)
	}
	if !c.sameDimension(k) {
		return nil, misfit(c, received(got, b.x, b.unit), k)
	}
	return c, nil
}

// between is a range from a to b.
func between(a, b measure, k Kind, got string) (Quantity, *Error) {
	low, e := measured(a.x, a.unit, k, got)
	if e != nil {
		return Quantity{}, e
	}
	high, e := measured(b.x, b.unit, k, got)
	if e != nil {
		return Quantity{}, e
	}
	if low.Gauge != high.Gauge {
		return Quantity{}, newError(CodeWrongKind, received(got, a.x, a.unit), k, "one end is a gauge pressure and the other is not")
	}
	if low.Value > high.Value {
		d := newError(CodeBadRange, received(got, a.x, a.unit), k, "the lower end of the range lies above the upper")
		d.Want = "the lower end first"
		if a.digits != "" && a.unit == b.unit {
			d = d.suggest(strings.TrimSpace(clip(b.digits + " .. " + a.digits + " " + a.unit)))
		}
		return Quantity{}, d
	}
	low.Value, high.Value = low.Value/2+high.Value/2, high.Value/2-low.Value/2
	return low.spread(Uniform, high.Value, false, k, received(got, a.x, a.unit))
}

// spread gives the quantity its uncertainty. One of no width is none.
func (q Quantity) spread(form Form, width float64, negative bool, k Kind, got string) (Quantity, *Error) {
	if negative {
		e := newError(CodeNegativeSpread, got, k, "the standard deviation is negative")
		e.Want = "one of zero or more"
		return Quantity{}, e
	}
	if !representable(width) {
		return Quantity{}, notFinite(got, k)
	}
	if width > 0 {
		q.Form, q.Spread = form, width
	}
	return q, nil
}
