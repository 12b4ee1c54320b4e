package whatif

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/input"
)

// Request is a plan as it was asked for, with what is no matter of the plan.
type Request struct {
	*Plan
	Format   string // of the rows; "" where it was not said
	Progress bool   // progress is wanted between the rows
	Shards   int64  // number of equal parts, at least 1
	Index    int64  // the part that is wanted, from 0
}

// DecodeRequest reads a sweep in strict JSON:
//
//	{"case": {…},
//	 "axes": [{"input": "flow.speed", "from": "0.1 m/s", "to": "10 m/s", "points": 200, "spacing": "log"},
//	          {"input": "structure.diameter", "values": ["0.1 m", "0.2 m"]}],
//	 "columns": ["class", "reynolds", "one-way.utilisation"],
//	 "format": "csv"}
//
// An axis may also be a text, as [ParseAxis] reads it.
// It returns the request, or everything that is wrong with it at once, or an
// [input.SyntaxError] where the document is no JSON. formats are the names that
// may stand as the format.
func DecodeRequest(data []byte, schema *input.Schema, formats []string) (*Request, []input.Violation, error) {
	root, err := wholeValue(data)
	if err != nil {
		return nil, nil, err
	}
	d := &requestDecoder{schema: schema, formats: formats}
	r := d.request(root)
	if d.bad.Any() {
		return nil, d.bad.List(), nil
	}
	return r, nil, nil
}

// wholeValue reads a document of one JSON value.
func wholeValue(data []byte) (jsontext.Value, error) {
	dec := jsontext.NewDecoder(bytes.NewBuffer(data), jsontext.AllowDuplicateNames(true))
	value, err := dec.ReadValue()
	if err != nil {
		return nil, syntaxError(err, dec)
	}
	value = value.Clone()
	if _, err := dec.ReadToken(); err == nil {
		return nil, syntaxError(&jsontext.SyntacticError{ByteOffset: dec.InputOffset(), Err: errors.New("more data after the request")}, dec)
	} else if !errors.Is(err, io.EOF) {
		return nil, syntaxError(err, dec)
	}
	return value, nil
}

func syntaxError(err error, dec *jsontext.Decoder) *input.SyntaxError {
	e := &input.SyntaxError{Offset: dec.InputOffset(), Pointer: string(dec.StackPointer())}
	what := "it ends too early"
	var syn *jsontext.SyntacticError
	if errors.As(err, &syn) {
		e.Offset, e.Pointer = syn.ByteOffset, string(syn.JSONPointer)
		if syn.Err != nil && !errors.Is(err, io.ErrUnexpectedEOF) {
			what = syn.Err.Error()
		}
	}
	e.Sentence = fmt.Sprintf("The document is no valid JSON at byte %d: %s.", e.Offset, what)
	return e
}

// requestDecoder collects what is wrong with a request.
type requestDecoder struct {
	schema  *input.Schema
	formats []string
	known   bool // the case was read
	bad     input.Violations
}

// requestMembers are the names of the members.
var requestMembers = []string{"case", "axes", "columns", "format", "progress", "shards", "index"}

func (d *requestDecoder) request(root jsontext.Value) *Request {
	m, ok := d.object("", root, "A sweep", requestMembers)
	if !ok {
		return nil
	}
	r := &Request{Format: d.format(m["format"]), Progress: d.flag("/progress", m["progress"])}
	r.Shards = d.whole("/shards", m["shards"], 1, 1, MaxPoints)
	r.Index = d.whole("/index", m["index"], 0, 0, r.Shards-1)
	c, known := d.theCase(m["case"])
	d.known = known
	axes := d.axes(m["axes"], c)
	columns := d.columns(m["columns"])
	if !known || axes == nil {
		if axes != nil {
			checkAxes(axes, &d.bad)
		}
		checkColumns(columns, &d.bad)
		return nil
	}
	r.Plan = newPlan(c, axes, columns, &d.bad)
	return r
}

// object takes an object apart. A name that is not known, or that is given
// twice, is a violation.
func (d *requestDecoder) object(at string, raw jsontext.Value, what string, known []string) (map[string]jsontext.Value, bool) {
	if raw.Kind() != '{' {
		d.bad.Add(at, input.WrongType, fmt.Sprintf("%s is an object; its members are %s.", what, strings.Join(known, ", ")), raw)
		return nil, false
	}
	members := map[string]jsontext.Value{}
	for name, value := range input.Members(raw) {
		pointer := at + "/" + escape(name)
		switch {
		case !slices.Contains(known, name):
			d.bad.Add(pointer, input.UnknownField, unknownName(what+" has no member", name, known), value)
		case members[name] != nil:
			d.bad.Add(pointer, input.Duplicate, fmt.Sprintf("%q is given twice.", name), value)
		default:
			members[name] = value
		}
	}
	return members, true
}

func unknownName(what, name string, known []string) string {
	if len(name) > 60 {
		name = name[:60]
	}
	s := fmt.Sprintf("%s %q", what, strings.ToValidUTF8(name, "\uFFFD"))
	if near := input.Nearest(name, known); len(near) > 0 {
		return s + ". Did you mean " + input.OrList(near) + "?"
	}
	return s + "; known are " + input.OrList(known) + "."
}

// elementsOf returns the elements of a list that is valid JSON.
func elementsOf(raw jsontext.Value) [][]byte {
	dec := jsontext.NewDecoder(bytes.NewBuffer(raw), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return nil
	}
	list := [][]byte{}
	for dec.PeekKind() != ']' {
		value, err := dec.ReadValue()
		if err != nil {
			return list
		}
		list = append(list, value.Clone())
	}
	return list
}

func (d *requestDecoder) format(raw jsontext.Value) string {
	if raw == nil {
		return ""
	}
	name, _ := textOf(raw)
	if !slices.Contains(d.formats, name) {
		d.bad.Add("/format", input.UnknownChoice, "format is "+input.OrList(d.formats)+".", raw)
	}
	return name
}

func (d *requestDecoder) flag(at string, raw jsontext.Value) bool {
	if raw != nil && raw.Kind() != 't' && raw.Kind() != 'f' {
		d.bad.Add(at, input.WrongType, strings.TrimPrefix(at, "/")+" is true or false.", raw)
	}
	return raw != nil && raw.Kind() == 't'
}

// whole reads a whole number within bounds.
func (d *requestDecoder) whole(at string, raw jsontext.Value, otherwise, least, most int64) int64 {
	if raw == nil {
		return otherwise
	}
	x, isNumber := numberOf(raw)
	name := strings.TrimPrefix(at, "/")
	switch {
	case !isNumber || x != math.Trunc(x):
		d.bad.Add(at, input.WrongType, name+" is a whole number.", raw)
	case x < float64(least) || x > float64(most):
		d.bad.Add(at, input.OutOfRange, fmt.Sprintf("%s is from %d to %d.", name, least, most), raw)
	default:
		return int64(x)
	}
	return otherwise
}

// theCase reads the case. Where it is no case, known is false and an empty case
// of its kind is returned, against which the axes can still be checked; nil where
// not even the kind is known.
func (d *requestDecoder) theCase(raw jsontext.Value) (c *input.Case, known bool) {
	if raw == nil {
		d.bad.Add("/case", input.MissingField, "A sweep needs the case that it varies.", nil)
		return nil, false
	}
	c, violations, err := input.Decode(raw, d.schema)
	if err == nil && len(violations) == 0 {
		return c, true
	}
	addAll(&d.bad, "/case", violations)
	if err != nil || raw.Kind() != '{' {
		return nil, false
	}
	for name, value := range input.Members(raw) {
		if name != "structure" || value.Kind() != '{' {
			continue
		}
		for inner, kind := range input.Members(value) {
			if text, _ := textOf(kind); inner == "kind" && d.schema.Kind(text) != nil {
				return input.NewCase(d.schema, text), false
			}
		}
	}
	return nil, false
}

// axes reads the axes; nil where there are none to be had.
func (d *requestDecoder) axes(raw jsontext.Value, c *input.Case) []Axis {
	const want = "axes is a list of the inputs that are varied."
	if raw == nil {
		d.bad.Add("/axes", input.MissingField, "A sweep needs axes: the inputs that are varied.", nil)
		return nil
	}
	if raw.Kind() != '[' {
		d.bad.Add("/axes", input.WrongType, want, raw)
		return nil
	}
	list := []Axis{}
	for i, element := range elementsOf(raw) {
		if i > MaxAxes {
			return append(list, Axis{}) // said where the plan is made
		}
		list = append(list, d.axis("/axes/"+strconv.Itoa(i), element, c))
	}
	return list
}

func (d *requestDecoder) axis(at string, raw jsontext.Value, c *input.Case) Axis {
	if text, isText := textOf(raw); isText {
		return d.axisText(at, text, raw, c)
	}
	m, ok := d.object(at, raw, "An axis", axisMembers)
	if !ok {
		return Axis{}
	}
	w := &writtenAxis{input: m["input"], from: m["from"], to: m["to"], points: m["points"], spacing: m["spacing"], step: m["step"]}
	if values := m["values"]; values != nil {
		w.badValues = values.Kind() != '['
		if w.badValues {
			d.bad.Add(at+"/values", input.WrongType, "values is a list.", values)
		} else {
			w.values = elementsOf(values)
		}
	}
	if name, _ := textOf(w.input); c == nil || !d.known && deep(name) {
		return Axis{} // ends of intervals and rows of lists are places only in a case that gives them
	}
	return w.axis(c, at, &d.bad)
}

// axisText reads an axis that is written as a text; what is wrong with it is at
// the place of the whole text.
func (d *requestDecoder) axisText(at, text string, raw jsontext.Value, c *input.Case) Axis {
	name, _, _ := strings.Cut(text, "=")
	if c == nil || !d.known && deep(name) {
		return Axis{}
	}
	a, err := ParseAxis(c, text)
	var bad *BadAxisError
	if errors.As(err, &bad) {
		for _, v := range bad.Violations {
			d.bad.Add(at, v.Code, v.Sentence, raw)
		}
	}
	return a
}

// deep reports whether a name is that of something inside a field.
func deep(name string) bool {
	return strings.Count(strings.ReplaceAll(strings.TrimPrefix(name, "/"), "/", "."), ".") > 1
}

func (d *requestDecoder) columns(raw jsontext.Value) []Column {
	if raw == nil {
		return nil
	}
	if raw.Kind() != '[' {
		d.bad.Add("/columns", input.WrongType, "columns is a list of names.", raw)
		return nil
	}
	list := []Column{}
	for i, element := range elementsOf(raw) {
		at := "/columns/" + strconv.Itoa(i)
		name, isText := textOf(element)
		if !isText {
			d.bad.Add(at, input.WrongType, `A column is a name: "reynolds".`, element)
			list = append(list, Column{}) // keeps the numbers of the others
			continue
		}
		c, err := FindColumn(name)
		if err != nil {
			d.bad.Add(at, input.UnknownChoice, withStop(upper(err.Error())), element)
		}
		list = append(list, c)
	}
	if len(list) == 0 {
		d.bad.Add("/columns", input.OutOfRange, "Leave columns out for the usual ones, or name at least one.", raw)
	}
	return list
}

// upper begins a sentence.
func upper(s string) string {
	if s == "" {
		return s
	}
	return strings.ToUpper(s[:1]) + s[1:]
}

// escape writes a name as one step of a JSON Pointer (RFC 6901).
func escape(name string) string {
	return strings.NewReplacer("~", "~0", "/", "~1").Replace(name)
}
