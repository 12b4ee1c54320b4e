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

// The names of spacings.
const (
	spacingLinear = "linear"
	spacingLog    = "log"
)

// writtenAxis is an axis as it was written: raw JSON by member, nil where a
// member is not given.
type writtenAxis struct {
	input, from, to, points, spacing, step []byte

	values    [][]byte // elements of the list; nil: no list
	badValues bool     // values is no list, which was said already
}

// axisMembers are the names of the members.
var axisMembers = []string{"input", "from", "to", "points", "spacing", "step", "values"}

// axis makes the axis for a case, and says at pointers below at what is wrong.
func (w *writtenAxis) axis(c *input.Case, at string, bad *input.Violations) Axis {
	p, ok := w.place(c, at, bad)
	if !ok {
		return Axis{}
	}
	m := &axisMaker{Axis: Axis{Place: p}, w: w, c: c, at: at, bad: bad}
	switch {
	case w.badValues:
	case w.values != nil:
		m.list()
	case m.Named():
		m.add("/values", input.MissingField, fmt.Sprintf("%s takes names: give them as values.", p.Path()), nil)
	default:
		m.span()
	}
	return m.Axis
}

func (w *writtenAxis) place(c *input.Case, at string, bad *input.Violations) (input.Place, bool) {
	if w.input == nil {
		bad.Add(at+"/input", input.MissingField, `An axis names its input: "flow.speed".`, nil)
		return input.Place{}, false
	}
	name, isText := textOf(w.input)
	if !isText {
		bad.Add(at+"/input", input.WrongType, `The input is a name: "flow.speed".`, w.input)
		return input.Place{}, false
	}
	p, err := c.FindPlace(name)
	if err != nil {
		bad.Add(at+"/input", input.UnknownField, withStop(err.Error()), w.input)
		return input.Place{}, false
	}
	return p, true
}

// axisMaker makes one axis.
type axisMaker struct {
	Axis
	w   *writtenAxis
	c   *input.Case
	at  string
	bad *input.Violations
}

func (m *axisMaker) add(member string, code input.Code, sentence string, raw []byte) {
	m.bad.Add(m.at+member, code, sentence, raw)
}

// list reads the values of a list.
func (m *axisMaker) list() {
	for _, o := range []struct {
		name string
		raw  []byte
	}{{"from", m.w.from}, {"to", m.w.to}, {"points", m.w.points}, {"spacing", m.w.spacing}, {"step", m.w.step}} {
		if o.raw != nil {
			m.add("/"+o.name, input.Contradiction, fmt.Sprintf("An axis has either values or a range; %s belongs to a range.", o.name), o.raw)
		}
	}
	if n := len(m.w.values); n == 0 || n > maxValues {
		m.add("/values", input.OutOfRange, fmt.Sprintf("A list has between 1 and %d values.", maxValues), nil)
		return
	}
	m.values = make([]input.Value, len(m.w.values))
	for i, raw := range m.w.values {
		m.values[i], _ = m.value("/values/"+strconv.Itoa(i), raw)
	}
}

// value reads one value, which must be certain.
func (m *axisMaker) value(member string, raw []byte) (v input.Value, ok bool) {
	return m.valueAt(m.Place, member, raw)
}

func (m *axisMaker) valueAt(p input.Place, member string, raw []byte) (v input.Value, ok bool) {
	v, violations := m.c.ParseValue(p, m.at+member, raw)
	addAll(m.bad, "", violations)
	if v.Q.Form != units.Certain {
		m.add(member, input.BadRange, "An axis is made of single values; this one is uncertain.", raw)
		return v, false
	}
	return v, len(violations) == 0
}

// addAll adds violations that were found below a pointer.
func addAll(bad *input.Violations, at string, list []input.Violation) {
	for _, v := range list {
		bad.Add(at+v.Pointer, v.Code, v.Sentence, []byte(v.Value))
	}
}

// span reads a range.
func (m *axisMaker) span() {
	from, fromOK := m.end("from", m.w.from)
	to, toOK := m.end("to", m.w.to)
	m.from, m.to, m.gauge = from.Value, to.Value, from.Gauge
	if fromOK && toOK && from.Gauge != to.Gauge {
		m.add("/to", input.WrongMeaning, "One end is a gauge pressure and the other is not.", m.w.to)
	}
	m.readSpacing(fromOK, toOK)
	switch {
	case m.w.points != nil && m.w.step != nil:
		m.add("/step", input.Contradiction, "A range has either points or a step.", m.w.step)
	case m.w.step != nil:
		m.byStep(fromOK && toOK)
	case m.w.points != nil:
		m.byPoints()
	default:
		m.add("/points", input.MissingField, "A range needs points, or a step.", nil)
	}
	if fromOK && toOK && m.points > 0 {
		m.whole()
	}
}

func (m *axisMaker) end(name string, raw []byte) (units.Quantity, bool) {
	if raw == nil {
		m.add("/"+name, input.MissingField, fmt.Sprintf("A range needs %s; a list has values.", name), nil)
		return units.Quantity{}, false
	}
	v, ok := m.value("/"+name, raw)
	return v.Q, ok
}

func (m *axisMaker) readSpacing(fromOK, toOK bool) {
	if m.w.spacing == nil {
		return
	}
	name, _ := textOf(m.w.spacing)
	if name != spacingLinear && name != spacingLog {
		m.add("/spacing", input.UnknownChoice, "spacing is linear or log.", m.w.spacing)
		return
	}
	m.log = name == spacingLog
	if !m.log {
		return
	}
	if m.w.step != nil {
		m.add("/step", input.Contradiction, "A logarithmic range has points, not a step.", m.w.step)
	}
	const positive = "A logarithmic range lies above zero."
	if fromOK && !(m.from > 0) {
		m.add("/from", input.OutOfRange, positive, m.w.from)
	}
	if toOK && !(m.to > 0) {
		m.add("/to", input.OutOfRange, positive, m.w.to)
	}
}

func (m *axisMaker) byPoints() {
	n, isNumber := numberOf(m.w.points)
	if !isNumber || n != math.Trunc(n) {
		m.add("/points", input.WrongType, "points is a whole number.", m.w.points)
		return
	}
	if n < 2 || n > MaxPoints {
		m.add("/points", input.OutOfRange, fmt.Sprintf("A range has between 2 and %d points; a single value is a list.", int64(MaxPoints)), m.w.points)
		return
	}
	m.points = int64(n)
}

// byStep counts the points of a step.
func (m *axisMaker) byStep(ends bool) {
	step, ok := m.readStep()
	if !ok || !ends {
		return
	}
	if !(step > 0) {
		m.add("/step", input.OutOfRange, "A step is greater than 0; it leads from the first end towards the second.", m.w.step)
		return
	}
	n := math.Floor(math.Abs(m.to-m.from)/step+nearStep) + 1
	if !(n <= MaxPoints) || n < 2 {
		m.add("/step", input.OutOfRange, fmt.Sprintf("With this step the range has no points between 2 and %d.", int64(MaxPoints)), m.w.step)
		return
	}
	m.points, m.step = int64(n), math.Copysign(step, m.to-m.from)
}

// readStep reads a step: a difference, so that of a temperature only the size of
// a degree counts, and the rule of the field does not bind it.
func (m *axisMaker) readStep() (float64, bool) {
	free := *m.Place.Field
	free.Rule = ""
	p := m.Place
	p.Field = &free
	if p.Kind() == units.Temperature {
		s, isText := textOf(m.w.step)
		if !isText {
			m.add("/step", input.WrongType, `A step of temperature is a text: "5 K".`, m.w.step)
			return 0, false
		}
		if q, err := units.Parse("0 K +- "+s, units.Temperature); err == nil {
			return q.Spread, true
		}
	}
	v, ok := m.valueAt(p, "/step", m.w.step)
	return v.Q.Value, ok
}

// whole refuses a range between whole numbers that does not keep to them.
func (m *axisMaker) whole() {
	if m.Place.Field.Type != input.Integer {
		return
	}
	gap := (m.to - m.from) / float64(m.points-1)
	if m.step != 0 {
		gap = m.step
	}
	if m.log || gap != math.Trunc(gap) {
		m.add("/points", input.OutOfRange, m.Name()+" takes whole numbers: give a step of 1, or values.", m.w.points)
	}
}

// withStop ends a sentence that has no end.
func withStop(s string) string {
	if strings.HasSuffix(s, ".") || strings.HasSuffix(s, "?") {
		return s
	}
	return s + "."
}

// textOf reads a JSON string.
func textOf(raw jsontext.Value) (string, bool) {
	if raw.Kind() != '"' {
		return "", false
	}
	b, err := jsontext.AppendUnquote(nil, raw)
	return string(b), err == nil
}

// numberOf reads a JSON number.
func numberOf(raw jsontext.Value) (float64, bool) {
	if raw.Kind() != '0' {
		return 0, false
	}
	x, err := strconv.ParseFloat(string(raw), 64)
	return x, err == nil
}
