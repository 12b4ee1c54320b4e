package whatif

import (
	"fmt"
	"math"
	"strconv"
	"strings"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/input"
	"regimed/units"
)

// Axis is one input that is varied, over a range or a list.
//
// A range of n points has the values
//
//	linear       x(i) = x₀ + i (x₁ − x₀)/(n − 1)
//	logarithmic  x(i) = x₀ (x₁/x₀)^(i/(n − 1))
//	by a step s  x(i) = x₀ ± i s, as far as x₁
//
// in SI; the ends are exact. A list may hold names where the input is a choice.
type Axis struct {
	Place input.Place

	from, to float64 // SI
	step     float64 // signed; 0: by the number of points
	points   int64
	log      bool
	gauge    bool // pressures above ambient

	values []input.Value // of a list; otherwise nil
}

// MaxPoints is the most points that an axis, and a whole sweep, may have.
const MaxPoints = 1_000_000_000_000

// maxValues is the most values that a list may have.
const maxValues = 10_000

// Name is the input in dots: "flow.speed".
func (a *Axis) Name() string { return a.Place.Path() }

// Named reports whether the values are names rather than numbers.
func (a *Axis) Named() bool { return a.Place.Field.Type == input.Choice }

// Unit is the SI unit of the values; "" where they are names.
func (a *Axis) Unit() string {
	if a.Named() {
		return ""
	}
	return a.Place.Kind().SI()
}

// Log reports whether the values are spaced by a ratio.
func (a *Axis) Log() bool { return a.log }

// Listed reports whether the values are those of a list.
func (a *Axis) Listed() bool { return a.values != nil }

// Step is the step of a range that was given by one; otherwise 0.
func (a *Axis) Step() float64 { return a.step }

// Spacing says how the values are spaced: "linear", "log" or "list".
func (a *Axis) Spacing() string {
	switch {
	case a.values != nil:
		return "list"
	case a.log:
		return spacingLog
	}
	return spacingLinear
}

// Len is the number of values.
func (a *Axis) Len() int64 {
	if a.values != nil {
		return int64(len(a.values))
	}
	return a.points
}

// X is the i-th value in SI; NaN where the values are names.
func (a *Axis) X(i int64) float64 {
	switch {
	case a.Named():
		return math.NaN()
	case a.values != nil:
		return a.values[i].Q.Value
	case i == 0:
		return a.from
	case a.step != 0:
		return a.stepped(i)
	case i == a.points-1:
		return a.to
	}
	low, high := min(a.from, a.to), max(a.from, a.to)
	return min(max(a.between(i), low), high)
}

// nearStep is the part of a step by which rounding may leave a point short of the
// far end of its range, or beyond: it is then that end.
const nearStep = 1e-9

func (a *Axis) stepped(i int64) float64 {
	x := a.from + float64(i)*a.step
	if math.Abs(x-a.to) <= nearStep*math.Abs(a.step) {
		return a.to
	}
	return x
}

func (a *Axis) between(i int64) float64 {
	n := float64(a.points - 1)
	if !a.log {
		if d := a.to - a.from; !math.IsInf(d, 0) {
			return a.from + d*float64(i)/n
		}
		t := float64(i) / n
		return a.from*(1-t) + a.to*t
	}
	t := float64(i) / n
	if ratio := a.to / a.from; ratio > 0 && !math.IsInf(ratio, 0) {
		return a.from * math.Pow(ratio, t)
	}
	return math.Exp(math.Log(a.from)*(1-t) + math.Log(a.to)*t)
}

// Text is the i-th value where the values are names; otherwise "".
func (a *Axis) Text(i int64) string {
	if !a.Named() {
		return ""
	}
	return a.values[i].Text
}

// Put sets the i-th value in a case. It returns false where the case does not
// admit it there.
func (a *Axis) Put(c *input.Case, i int64) bool {
	if a.Named() {
		return c.Put(a.Place, a.values[i])
	}
	ok := c.Set(a.Place, a.X(i))
	if q := c.At(a.Place); q != nil {
		q.Gauge = a.gaugeAt(i)
	}
	return ok
}

func (a *Axis) gaugeAt(i int64) bool {
	if a.values != nil {
		return a.values[i].Q.Gauge
	}
	return a.gauge
}

// BadAxisError says what is wrong with an axis that was written as a text.
type BadAxisError struct {
	Text       string
	Violations []input.Violation // pointers into the axis as an object: "/from"
}

func (e *BadAxisError) Error() string {
	parts := make([]string, len(e.Violations))
	for i, v := range e.Violations {
		parts[i] = v.Sentence
	}
	return fmt.Sprintf("%q: %s", e.Text, strings.Join(parts, " "))
}

// AxisForm shows how an axis is written as a text.
const AxisForm = "INPUT=FROM..TO:POINTS, INPUT=FROM..TO:POINTS:log, INPUT=FROM..TO:step STEP or INPUT=VALUE,VALUE,…"

// ParseAxis reads an axis from a text:
//
//	flow.speed=0.1..10 m/s:200            200 values, equally spaced
//	flow.speed=0.1..10 m/s:200:log        equally spaced in the logarithm
//	flow.speed=0..10 m/s:step 0.5 m/s     from the first end by a step
//	structure.diameter=0.1 m,0.2 m        a list
//	fluid.name=water,seawater             a list of names
//
// Where the first end has no unit it has that of the second. An error is a
// [BadAxisError].
func ParseAxis(c *input.Case, text string) (Axis, error) {
	var bad input.Violations
	w, ok := axisOfText(c, text, &bad)
	if !ok {
		return Axis{}, &BadAxisError{text, bad.List()}
	}
	a := w.axis(c, "", &bad)
	if bad.Any() {
		return Axis{}, &BadAxisError{text, bad.List()}
	}
	return a, nil
}

// axisOfText takes the text of an axis apart.
func axisOfText(c *input.Case, text string, bad *input.Violations) (*writtenAxis, bool) {
	name, rest, found := strings.Cut(text, "=")
	name, rest = strings.TrimSpace(name), strings.TrimSpace(rest)
	if !found || name == "" || rest == "" {
		bad.Add("", input.BadQuantity, "An axis is written "+AxisForm+".", nil)
		return nil, false
	}
	w := &writtenAxis{input: quote(name)}
	place, err := c.FindPlace(name)
	if err != nil {
		return w, true // said where the axis is made
	}
	from, after, ranged := cutRange(rest)
	if !ranged {
		for value := range strings.SplitSeq(rest, ",") {
			w.values = append(w.values, rawOf(place, strings.TrimSpace(value)))
		}
		return w, true
	}
	parts := strings.Split(after, ":")
	to := strings.TrimSpace(parts[0])
	w.from, w.to = rawOf(place, withUnitOf(place, from, to)), rawOf(place, to)
	for _, part := range parts[1:] {
		if !w.option(place, strings.TrimSpace(part)) {
			bad.Add("", input.BadQuantity, fmt.Sprintf("%q is neither a number of points nor linear, log or step …. An axis is written %s.", part, AxisForm), nil)
			return nil, false
		}
	}
	return w, true
}

// cutRange cuts FROM..TO; three dots are read as two.
func cutRange(s string) (from, to string, ok bool) {
	from, to, ok = strings.Cut(s, "..")
	return strings.TrimSpace(from), strings.TrimSpace(strings.TrimPrefix(to, ".")), ok
}

// option takes what stands after a colon: the points, the spacing or the step.
func (w *writtenAxis) option(p input.Place, s string) bool {
	if step, is := strings.CutPrefix(s, "step"); is && w.step == nil {
		w.step = rawOf(p, strings.TrimSpace(step))
		return true
	}
	if _, err := strconv.ParseInt(s, 10, 64); err == nil && w.points == nil {
		w.points = []byte(s)
		return true
	}
	if (s == spacingLog || s == spacingLinear) && w.spacing == nil {
		w.spacing = quote(s)
		return true
	}
	return false
}

// rawOf writes a value as it would stand in JSON: a whole number bare, anything
// else as a string.
func rawOf(p input.Place, s string) []byte {
	if p.Field.Type == input.Integer && jsontext.Value(s).IsValid() {
		return []byte(s)
	}
	return quote(s)
}

// withUnitOf gives a bare number the unit that another text is written in.
func withUnitOf(p input.Place, s, other string) string {
	if _, err := strconv.ParseFloat(s, 64); err != nil {
		return s
	}
	q, err := units.Parse(other, p.Kind())
	if err != nil || q.Unit == "" {
		return s
	}
	return s + " " + q.Unit
}

func quote(s string) []byte {
	b, err := jsontext.AppendQuote(nil, strings.ToValidUTF8(s, "\uFFFD"))
	if err != nil {
		return []byte(`""`) // any valid text can be quoted
	}
	return b
}
