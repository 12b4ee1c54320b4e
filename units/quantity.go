package units

import (
	"math"
	"strconv"
	"strings"
)

// Form says how certain a quantity is.
type Form uint8

// The forms.
const (
	Certain Form = iota // one value
	Normal              // a mean and a standard deviation
	Uniform             // a range
)

// String is the name of the form: "normal".
func (f Form) String() string {
	switch f {
	case Certain:
		return "certain"
	case Normal:
		return "normal"
	case Uniform:
		return "uniform"
	}
	return "unknown form"
}

// Quantity is a number in the SI unit of its kind, with its uncertainty.
type Quantity struct {
	Value  float64 // of a range: the middle
	Form   Form
	Spread float64 // one standard deviation (Normal), half the width (Uniform), or 0
	Unit   string  // the unit expression as written, "" for a bare number
	Gauge  bool    // an absolute pressure that was written as a gauge pressure: the ambient pressure has still to be added
}

// Low is the lower end of a range; otherwise the value.
func (q Quantity) Low() float64 {
	if q.Form == Uniform {
		return q.Value - q.Spread
	}
	return q.Value
}

// High is the upper end of a range; otherwise the value.
func (q Quantity) High() float64 {
	if q.Form == Uniform {
		return q.Value + q.Spread
	}
	return q.Value
}

// FromNumber is the quantity that a number without a unit stands for: only kinds
// that are pure numbers have one.
func FromNumber(x float64, k Kind) (Quantity, error) {
	return result(bare(x, k, ""))
}

// FromValueUnit is the quantity of a number and a unit expression.
func FromValueUnit(value float64, unitExpr string, k Kind) (Quantity, error) {
	return result(measured(value, strings.TrimSpace(unitExpr), k, ""))
}

// result keeps a nil *Error from becoming an error.
func result(q Quantity, e *Error) (Quantity, error) {
	if e != nil {
		return Quantity{}, e
	}
	return q, nil
}

// received is the text for an error message: as it was got, or put together
// from its parts where they came separately.
func received(got string, x float64, unitExpr string) string {
	if got != "" {
		return got
	}
	number := strconv.FormatFloat(x, 'g', -1, 64)
	if unitExpr == "" {
		return number
	}
	return number + " " + unitExpr
}

// bare is the quantity of a number without a unit, received within the text got.
func bare(x float64, k Kind, got string) (Quantity, *Error) {
	if !k.bare() {
		return Quantity{}, missingUnit(x, k, got)
	}
	if !representable(x) {
		return Quantity{}, notFinite(received(got, x, ""), k)
	}
	return Quantity{Value: x}, nil
}

func missingUnit(x float64, k Kind, got string) *Error {
	e := newError(CodeMissingUnit, received(got, x, ""), k, "a number without a unit")
	if !representable(x) {
		return e
	}
	n := strconv.FormatFloat(x, 'g', -1, 64)
	switch k {
	case Frequency:
		return e.suggest(n + " Hz" + either + n + " rad/s")
	case Temperature:
		return e.suggest(n + " degC" + either + n + " K")
	case Salinity:
		return e.suggest(n + " g/kg" + either + n + " kg/kg")
	case Angle:
		return e.suggest(n + " deg" + either + n + " rad")
	}
	return e.suggest(n + " " + k.SI())
}

// measured is the quantity of x in the unit text, received within the text got.
func measured(x float64, text string, k Kind, got string) (Quantity, *Error) {
	if text == "" {
		return bare(x, k, got)
	}
	c, e := unitOf(x, text, k, got)
	if e != nil {
		return Quantity{}, e
	}
	return c.quantity(x, k, got)
}

// unitOf compiles a unit expression and checks that it has the meaning of the kind.
func unitOf(x float64, text string, k Kind, got string) (*compiled, *Error) {
	c, f := compile(text)
	if f != nil {
		return nil, explain(f, text, received(got, x, text), k)
	}
	if !c.fits(k) {
		return nil, misfit(c, received(got, x, text), k)
	}
	return c, nil
}

// quantity is x of the unit.
func (c *compiled) quantity(x float64, k Kind, got string) (Quantity, *Error) {
	v := c.convert(x, k)
	if !representable(v) || v == 0 && x != 0 && c.offset == 0 {
		return Quantity{}, notFinite(received(got, x, c.text), k)
	}
	if k == Temperature && v < 0 {
		e := newError(CodeBelowZero, received(got, x, c.text), k, "below absolute zero")
		e.Want = "a temperature above 0 K, -273.15 degC or -459.67 degF"
		return Quantity{}, e
	}
	return Quantity{Value: v, Unit: c.text, Gauge: k == Pressure && c.mark == gauge}, nil
}

// representable says whether x is zero or a normal double.
func representable(x float64) bool {
	const tiny = 0x1p-1022
	a := math.Abs(x)
	return a == 0 || a >= tiny && a <= math.MaxFloat64
}

func notFinite(got string, k Kind) *Error {
	e := newError(CodeNotFinite, got, k, "not a finite number")
	e.Want = k.info().phrase + " within the range of floating-point numbers"
	return e
}
