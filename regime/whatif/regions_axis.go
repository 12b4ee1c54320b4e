package whatif

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/input"
	"regimed/units"
)

// MapAxis is one axis of a map: an input that is varied continuously, upwards.
type MapAxis struct {
	Place    input.Place
	From, To float64 // SI
	Log      bool
	Unit     string // in which the range was written; "" where it was not
	gauge    bool   // pressures above ambient
}

// Name is the input in dots: "flow.speed".
func (a *MapAxis) Name() string { return a.Place.Path() }

// At is the input in SI at a position between 0 and 1.
func (a *MapAxis) At(s float64) float64 {
	switch {
	case s <= 0:
		return a.From
	case s >= 1:
		return a.To
	case a.Log:
		return min(max(math.Exp(math.Log(a.From)*(1-s)+math.Log(a.To)*s), a.From), a.To)
	}
	return min(max(a.From*(1-s)+a.To*s, a.From), a.To)
}

// Position is where on the axis an input in SI stands: between 0 and 1 within
// its range; NaN for what a logarithmic axis cannot show.
func (a *MapAxis) Position(x float64) float64 {
	if !a.Log {
		return x/(a.To-a.From) - a.From/(a.To-a.From)
	}
	if !(x > 0) {
		return math.NaN()
	}
	return (math.Log(x) - math.Log(a.From)) / (math.Log(a.To) - math.Log(a.From))
}

// put sets the input in a case. It returns false where the case does not admit it.
func (a *MapAxis) put(c *input.Case, s float64) bool {
	ok := c.Set(a.Place, a.At(s))
	if q := c.At(a.Place); q != nil {
		q.Gauge = a.gauge
	}
	return ok
}

// MapAxisForm shows how the axis of a map is written as a text.
const MapAxisForm = "INPUT=FROM..TO, INPUT=FROM..TO:log or INPUT alone, which is a decade either side of its value"

// ParseMapAxis reads the axis of a map from a text, as [ParseAxis] reads that of a
// sweep but without a number of points:
//
//	flow.speed=0.1..10 m/s:log
//	flow.speed                     a decade either side of the value in the case
//
// An error is a [BadAxisError].
func ParseMapAxis(c *input.Case, text string) (MapAxis, error) {
	var bad input.Violations
	w := &writtenAxis{input: quote(strings.TrimSpace(text))}
	ok := true
	if strings.Contains(text, "=") {
		w, ok = axisOfText(c, text, &bad)
	}
	var a MapAxis
	if ok {
		a = w.mapAxis(c, "", &bad)
	}
	if bad.Any() {
		return MapAxis{}, &BadAxisError{text, bad.List()}
	}
	return a, nil
}

// mapMembers are the members of the axis of a map.
var mapMembers = []string{"input", "from", "to", "spacing"}

// ReadMapAxes reads both axes of a map, x and y, from JSON. What is wrong is said
// at pointers below /x and /y.
func ReadMapAxes(c *input.Case, x, y jsontext.Value, bad *input.Violations) (MapAxis, MapAxis) {
	var axes [2]MapAxis
	for i, raw := range []jsontext.Value{x, y} {
		at := [2]string{"/x", "/y"}[i]
		if raw == nil {
			bad.Add(at, input.MissingField, "A map needs two axes, x and y.", nil)
			continue
		}
		axes[i] = readMapAxis(c, at, raw, bad)
	}
	if !bad.Any() && axes[0].Place == axes[1].Place {
		bad.Add("/y", input.Contradiction, axes[1].Name()+" is already the input of x; a map needs two.", y)
	}
	return axes[0], axes[1]
}

// readMapAxis reads one axis:
//
//	{"input": "flow.speed", "from": "0.1 m/s", "to": "10 m/s", "spacing": "log"}
//	{"input": "flow.speed"}
//	"flow.speed=0.1..10 m/s:log"
func readMapAxis(c *input.Case, at string, raw jsontext.Value, bad *input.Violations) MapAxis {
	if text, isText := textOf(raw); isText {
		return readMapAxisText(c, at, text, raw, bad)
	}
	if raw.Kind() != '{' {
		bad.Add(at, input.WrongType, `An axis is an object: {"input": "flow.speed", "from": "0.1 m/s", "to": "10 m/s", "spacing": "log"}.`, raw)
		return MapAxis{}
	}
	members := map[string]jsontext.Value{}
	for name, value := range input.Members(raw) {
		switch {
		case !slices.Contains(mapMembers, name):
			bad.Add(at+"/"+escape(name), input.UnknownField, unknownMapMember(name), value)
		case members[name] != nil:
			bad.Add(at+"/"+escape(name), input.Duplicate, fmt.Sprintf("%q is given twice.", name), value)
		default:
			members[name] = value
		}
	}
	w := &writtenAxis{input: members["input"], from: members["from"], to: members["to"], spacing: members["spacing"]}
	return w.mapAxis(c, at, bad)
}

// readMapAxisText reads an axis that is written as a text; what is wrong with it
// is at the place of the whole text.
func readMapAxisText(c *input.Case, at, text string, raw jsontext.Value, bad *input.Violations) MapAxis {
	a, err := ParseMapAxis(c, text)
	var wrong *BadAxisError
	if errors.As(err, &wrong) {
		for _, v := range wrong.Violations {
			bad.Add(at, v.Code, v.Sentence, raw)
		}
	}
	return a
}

func unknownMapMember(name string) string {
	if slices.Contains(axisMembers, name) {
		return fmt.Sprintf("A map has no %s: it is drawn through, from one end to the other.", name)
	}
	return unknownName("The axis of a map has no member", name, mapMembers)
}

// mapAxis makes the axis of a map.
func (w *writtenAxis) mapAxis(c *input.Case, at string, bad *input.Violations) MapAxis {
	p, ok := w.place(c, at, bad)
	if !ok {
		return MapAxis{}
	}
	m := &axisMaker{Axis: Axis{Place: p}, w: w, c: c, at: at, bad: bad}
	for _, o := range []struct {
		name  string
		given bool
		raw   []byte
	}{{"values", w.values != nil, nil}, {"points", w.points != nil, w.points}, {"step", w.step != nil, w.step}} {
		if o.given {
			m.add("/"+o.name, input.UnknownField, unknownMapMember(o.name), o.raw)
		}
	}
	switch {
	case m.Named() || p.Field.Type == input.Integer:
		m.add("/input", input.WrongMeaning, p.Path()+" is not continuous: an axis of a map is a quantity.", w.input)
	case w.values != nil:
	case w.from == nil && w.to == nil:
		return m.decade()
	default:
		return m.between()
	}
	return MapAxis{}
}

// between is a range as it was written.
func (m *axisMaker) between() MapAxis {
	before := len(m.bad.List())
	written := *m.w
	written.points, written.step = []byte("2"), nil
	m.w = &written
	m.span()
	if len(m.bad.List()) > before {
		return MapAxis{}
	}
	a := MapAxis{Place: m.Place, From: min(m.from, m.to), To: max(m.from, m.to), Log: m.log, gauge: m.gauge}
	if v, violations := m.c.ParseValue(m.Place, "", m.w.to); len(violations) == 0 {
		a.Unit = v.Q.Unit
	}
	if !(a.To > a.From) || math.IsInf(a.To-a.From, 0) || a.Log && math.IsInf(a.To/a.From, 0) {
		m.add("/to", input.BadRange, "The range of an axis has two different ends, not so far apart that their distance has no number.", m.w.to)
	}
	return a
}

// decade is the range where only the input is named: from a tenth of its value in
// the case to ten times it, as far as the rule of the field goes.
func (m *axisMaker) decade() MapAxis {
	q := m.c.At(m.Place)
	name := m.Place.Path()
	switch {
	case q == nil:
		m.add("/from", input.MissingField, fmt.Sprintf("The case does not give %s: give the range of the axis.", name), nil)
		return MapAxis{}
	case !(q.Value > 0) || m.Place.Kind() == units.Temperature || !(q.Value < math.MaxFloat64/10):
		m.add("/from", input.MissingField, fmt.Sprintf("A decade either side of %s means nothing for %s: give the range of the axis.", units.Format(q.Value, m.Place.Kind()), name), nil)
		return MapAxis{}
	}
	m.readSpacing(false, false)
	a := MapAxis{Place: m.Place, From: q.Value / 10, To: q.Value * 10, Log: m.log || m.w.spacing == nil, Unit: q.Unit, gauge: q.Gauge}
	a.From, a.To = allowed(m.Place.Field, q.Value, a.From), allowed(m.Place.Field, q.Value, a.To)
	if !(a.To > a.From) {
		m.add("/from", input.MissingField, fmt.Sprintf("%s may have no other value near that of the case: give the range of the axis.", name), nil)
	}
	return a
}

// allowed is the end of a range, or else the last value before it that the rule
// of a field allows.
func allowed(f *input.Field, inside, end float64) float64 {
	if f.Allows(end) {
		return end
	}
	for range 60 {
		middle := (inside + end) / 2
		if f.Allows(middle) {
			inside = middle
		} else {
			end = middle
		}
	}
	return inside
}
