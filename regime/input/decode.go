package input

import (
	"bytes"
	"errors"
	"fmt"
	"io"
	"iter"
	"math"
	"strconv"
	"strings"

	"github.com/go-json-experiment/json/jsontext"
	"github.com/go-playground/validator/v10"

	"regimed/units"
)

// SyntaxError says that a document is no JSON, and where.
type SyntaxError struct {
	Pointer  string
	Offset   int64
	Sentence string
}

func (e *SyntaxError) Error() string { return e.Sentence }

// rules checks the rule of a field, as "gt=0", on its number.
var rules = validator.New(validator.WithRequiredStructEnabled())

// Decode reads a case in strict JSON. It returns the case, or everything that
// is wrong with it at once, or a SyntaxError where the document is no JSON.
func Decode(data []byte, schema *Schema) (*Case, []Violation, error) {
	d := &decoder{schema: schema, json: jsontext.NewDecoder(bytes.NewBuffer(data), jsontext.AllowDuplicateNames(true))}
	if err := d.document(); err != nil {
		return nil, nil, syntaxError(err, d.json)
	}
	if d.bad.Any() {
		return nil, d.bad.List(), nil
	}
	return d.made, nil, nil
}

type decoder struct {
	schema *Schema
	json   *jsontext.Decoder
	made   *Case
	bad    Violations
}

func syntaxError(err error, dec *jsontext.Decoder) error {
	e := &SyntaxError{Offset: dec.InputOffset(), Pointer: string(dec.StackPointer())}
	what := "is no valid JSON"
	var syn *jsontext.SyntacticError
	if errors.As(err, &syn) {
		e.Offset, e.Pointer = syn.ByteOffset, string(syn.JSONPointer)
		if syn.Err != nil {
			what = syn.Err.Error()
		}
	}
	if errors.Is(err, io.ErrUnexpectedEOF) || errors.Is(err, io.EOF) {
		what = "it ends too early"
	}
	e.Sentence = fmt.Sprintf("The document is no valid JSON at byte %d: %s.", e.Offset, what)
	return e
}

// document reads the whole document.
func (d *decoder) document() error {
	if k := d.json.PeekKind(); k != '{' {
		raw, err := d.json.ReadValue()
		if err != nil {
			return err
		}
		d.bad.Add("", WrongType, "A case is a JSON object.", raw)
		return d.end()
	}
	if _, err := d.json.ReadToken(); err != nil {
		return err
	}
	d.made = NewCase(d.schema, "")
	seen := names{}
	sawStructure := false
	for d.json.PeekKind() != '}' {
		name, raw, err := d.member()
		if err != nil {
			return err
		}
		pointer := "/" + escape(name)
		if seen.again(name) {
			d.bad.Add(pointer, Duplicate, fmt.Sprintf("%q is given twice.", name), raw)
			continue
		}
		switch {
		case name == "structure":
			sawStructure = true
			d.structure(raw)
		case d.schema.Block(name) != nil:
			b := d.schema.Block(name)
			d.block(b, pointer, raw)
		case d.schema.Top.Find(name) != nil:
			d.field(d.schema.Top.Find(name), pointer, raw)
		default:
			d.bad.Add(pointer, UnknownField, unknown("field", name, d.topNames()), raw)
		}
	}
	if _, err := d.json.ReadToken(); err != nil {
		return err
	}
	if !sawStructure {
		d.bad.Add("/structure", MissingField, "A case needs a structure.", nil)
	}
	return d.end()
}

// end refuses what follows the document.
func (d *decoder) end() error {
	_, err := d.json.ReadToken()
	if errors.Is(err, io.EOF) {
		return nil
	}
	if err == nil {
		return &jsontext.SyntacticError{ByteOffset: d.json.InputOffset(), Err: errors.New("more data after the case")}
	}
	return err
}

// member reads a name and the raw value that belongs to it.
func (d *decoder) member() (string, jsontext.Value, error) { return member(d.json) }

func member(dec *jsontext.Decoder) (string, jsontext.Value, error) {
	tok, err := dec.ReadToken()
	if err != nil {
		return "", nil, err
	}
	name := tok.String()
	raw, err := dec.ReadValue()
	return name, raw, err
}

func (d *decoder) topNames() []string {
	list := []string{"structure"}
	for _, b := range d.schema.Blocks {
		list = append(list, b.Name)
	}
	for _, f := range d.schema.Top.Fields {
		list = append(list, f.Name)
	}
	return list
}

// structure reads the structure: its kind first, wherever it stands.
func (d *decoder) structure(raw jsontext.Value) {
	const at = "/structure"
	if raw.Kind() != '{' {
		d.bad.Add(at, WrongType, "The structure is an object with a kind.", raw)
		return
	}
	kindRaw, found := find(raw, "kind")
	if !found {
		d.bad.Add(at+"/kind", MissingField, "The structure needs a kind: "+OrList(d.kindNames())+".", nil)
		return
	}
	if kindRaw.Kind() != '"' {
		d.bad.Add(at+"/kind", WrongType, "The kind is a name: "+OrList(d.kindNames())+".", kindRaw)
		return
	}
	name := text(kindRaw)
	kind := d.schema.Kind(name)
	if kind == nil {
		d.bad.Add(at+"/kind", UnknownKind, unknown("structure kind", name, d.kindNames()), kindRaw)
		return
	}
	d.made.Kind = name
	d.block(kind, at, raw)
}

func (d *decoder) kindNames() []string {
	var list []string
	for _, b := range d.schema.Kinds {
		list = append(list, b.Name)
	}
	return list
}

// find returns the first member of that name in an object.
func find(raw jsontext.Value, name string) (jsontext.Value, bool) {
	dec := jsontext.NewDecoder(bytes.NewBuffer(raw), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return nil, false
	}
	for dec.PeekKind() == '"' {
		n, v, err := member(dec)
		if err != nil {
			return nil, false
		}
		if n == name {
			return bytes.Clone(v), true
		}
	}
	return nil, false
}

// block reads an object of fields.
func (d *decoder) block(b *Block, at string, raw jsontext.Value) {
	if raw.Kind() == '"' && b.Shorthand != nil {
		d.field(b.Shorthand, at, raw)
		return
	}
	if raw.Kind() != '{' {
		want := "an object"
		if b.Shorthand != nil {
			want = "an object, or a name in place of it"
		}
		d.bad.Add(at, WrongType, fmt.Sprintf("%q is %s.", strings.TrimPrefix(at, "/"), want), raw)
		return
	}
	dec := jsontext.NewDecoder(bytes.NewBuffer(raw), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return
	}
	isStructure := at == "/structure"
	seen := names{}
	for dec.PeekKind() == '"' {
		name, value, err := member(dec)
		if err != nil {
			return
		}
		pointer := at + "/" + escape(name)
		if seen.again(name) {
			d.bad.Add(pointer, Duplicate, fmt.Sprintf("%q is given twice.", name), value)
			continue
		}
		if isStructure && name == "kind" {
			continue
		}
		f := b.Find(name)
		if f == nil {
			d.bad.Add(pointer, UnknownField, unknown("field", name, fieldNames(b, isStructure)), value)
			continue
		}
		d.field(f, pointer, value)
	}
	for _, f := range b.Fields {
		if f.Needed && !seen.has(f.Name) {
			d.bad.Add(at+"/"+f.Name, MissingField, fmt.Sprintf("%s is needed: %s.", f.Path(), f.Doc), nil)
		}
	}
}

func fieldNames(b *Block, isStructure bool) []string {
	var list []string
	if isStructure {
		list = append(list, "kind")
	}
	for _, f := range b.Fields {
		list = append(list, f.Name)
	}
	return list
}

// field reads the value of one field.
func (d *decoder) field(f *Field, at string, raw jsontext.Value) {
	if raw.Kind() == 'n' {
		d.bad.Add(at, WrongType, fmt.Sprintf("%s is null; leave the field out instead.", f.Path()), raw)
		return
	}
	if f.Service != nil && raw.Kind() == '{' {
		if as, marked := find(raw, "as"); marked {
			d.service(f, at, raw, as)
			return
		}
	}
	v := Value{Field: f}
	ok := false
	switch f.Type {
	case Quantity:
		v.Q, ok = d.quantity(f, f.Kind, at, raw)
		ok = ok && d.rule(f, v.Q.Value, at, raw)
	case Number:
		v.Q, ok = d.quantity(f, units.Dimensionless, at, raw)
		ok = ok && d.rule(f, v.Q.Value, at, raw)
	case Integer:
		v.Q, ok = d.integer(f, at, raw)
		ok = ok && d.rule(f, v.Q.Value, at, raw)
	case Flag:
		v.Flag, ok = raw.Kind() == 't', raw.Kind() == 't' || raw.Kind() == 'f'
		if !ok {
			d.bad.Add(at, WrongType, fmt.Sprintf("%s is true or false.", f.Path()), raw)
		}
	case Text:
		v.Text, ok = d.text(f, at, raw)
	case Choice:
		v.Text, ok = d.choice(f, at, raw)
	case Choices:
		v.List, ok = d.choices(f, at, raw)
	case Interval:
		v.Ends, ok = d.interval(f, at, raw)
	case Rows:
		v.Rows, ok = d.rows(f, at, raw)
	}
	d.keep(v, ok, at, raw)
}

// keep keeps a value that was read, unless its field has one already.
func (d *decoder) keep(v Value, ok bool, at string, raw jsontext.Value) {
	switch {
	case !ok || d.made == nil:
	case d.made.Has(v.Field):
		d.bad.Add(at, Duplicate, v.Field.Path()+" is given twice.", raw)
	default:
		d.made.set(v)
	}
}

// service reads a range that is marked as one of operation, "as": "range", in
// place of the field that holds one.
func (d *decoder) service(f *Field, at string, raw, as jsontext.Value) {
	if as.Kind() != '"' || text(as) != "range" {
		d.bad.Add(at+"/as", UnknownChoice, "as is \"range\": the values in service.", as)
		return
	}
	o, ok := d.object(f, at, raw)
	if !ok {
		return
	}
	if o.Low == nil || o.High == nil || o.Value != nil || o.Std != nil || o.Percent != nil {
		d.bad.Add(at, MissingField, "A range of operation has low, high and unit.", raw)
		return
	}
	v := Value{Field: f.Service}
	for i, x := range []float64{*o.Low, *o.High} {
		q, err := units.FromValueUnit(x, o.Unit, f.Kind)
		if err != nil {
			d.unitError(f, at, raw, err)
			return
		}
		if !d.rule(f, q.Value, at, raw) {
			return
		}
		v.Ends[i] = q
	}
	if v.Ends[0].Value > v.Ends[1].Value {
		d.bad.Add(at, Contradiction, fmt.Sprintf("%s: the lowest value is above the highest.", f.Path()), raw)
		return
	}
	d.keep(v, true, at, raw)
}

// rule checks the plain range of a number.
func (d *decoder) rule(f *Field, x float64, at string, raw jsontext.Value) bool {
	if f.Rule == "" {
		return true
	}
	err := rules.Var(x, f.Rule)
	if err == nil {
		return true
	}
	d.bad.Add(at, OutOfRange, fmt.Sprintf("%s must be %s.", f.Path(), RuleText(f)), raw)
	return false
}

// RuleText says the rule of a field in words: "greater than 0".
func RuleText(f *Field) string {
	var parts []string
	unit := ""
	if f.Type == Quantity && f.Kind.SI() != "1" {
		unit = " " + f.Kind.SI()
	}
	for tag := range strings.SplitSeq(f.Rule, ",") {
		name, bound, _ := strings.Cut(tag, "=")
		word := map[string]string{"gt": "greater than", "gte": "at least", "lt": "less than", "lte": "at most", "max": "at most", "min": "at least"}[name]
		parts = append(parts, word+" "+bound+unit)
	}
	return strings.Join(parts, " and ")
}

func (d *decoder) quantity(f *Field, k units.Kind, at string, raw jsontext.Value) (units.Quantity, bool) {
	var q units.Quantity
	var err error
	switch raw.Kind() {
	case '"':
		q, err = units.Parse(text(raw), k)
	case '0':
		x, bad := number(raw)
		if bad != nil {
			d.bad.Add(at, NotFinite, fmt.Sprintf("%s is no number that can be computed with.", f.Path()), raw)
			return q, false
		}
		q, err = units.FromNumber(x, k)
	case '{':
		o, good := d.object(f, at, raw)
		if !good {
			return q, false
		}
		q, err = units.FromObject(o, k)
	default:
		d.bad.Add(at, WrongType, fmt.Sprintf("%s is %s: %q or {\"value\": …, \"unit\": \"%s\"}.", f.Path(), phrase(k), k.Example(), k.SI()), raw)
		return q, false
	}
	if err != nil {
		d.unitError(f, at, raw, err)
		return q, false
	}
	if math.IsNaN(q.Value) || math.IsInf(q.Value, 0) {
		d.bad.Add(at, NotFinite, fmt.Sprintf("%s is no number that can be computed with.", f.Path()), raw)
		return q, false
	}
	return q, true
}

func phrase(k units.Kind) string {
	if k == units.Dimensionless {
		return "a number"
	}
	return "a quantity (" + k.String() + ")"
}

func (d *decoder) unitError(f *Field, at string, raw jsontext.Value, err error) {
	code := BadQuantity
	sentence := err.Error()
	var ue *units.Error
	if errors.As(err, &ue) {
		code = Code(ue.Code)
	}
	d.bad.Add(at, code, f.Path()+": "+sentence, raw)
}

var objectNames = []string{"value", "unit", "std", "percent", "low", "high"}

// object reads the object form of a quantity.
func (d *decoder) object(f *Field, at string, raw jsontext.Value) (units.Object, bool) {
	var o units.Object
	ok := true
	dec := jsontext.NewDecoder(bytes.NewBuffer(raw), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return o, false
	}
	seen := names{}
	for dec.PeekKind() == '"' {
		name, value, err := member(dec)
		if err != nil {
			return o, false
		}
		pointer := at + "/" + escape(name)
		if seen.again(name) {
			d.bad.Add(pointer, Duplicate, fmt.Sprintf("%q is given twice.", name), value)
			ok = false
			continue
		}
		ok = d.objectMember(f, &o, name, pointer, value) && ok
	}
	return o, ok
}

func (d *decoder) objectMember(f *Field, o *units.Object, name, pointer string, value jsontext.Value) bool {
	if name == "as" && f.Service != nil {
		return true
	}
	if name == "unit" {
		if value.Kind() != '"' {
			d.bad.Add(pointer, WrongType, "A unit is a string.", value)
			return false
		}
		o.Unit = text(value)
		return true
	}
	target := map[string]**float64{"value": &o.Value, "std": &o.Std, "percent": &o.Percent, "low": &o.Low, "high": &o.High}[name]
	if target == nil {
		d.bad.Add(pointer, UnknownField, unknown("field", name, objectNames), value)
		return false
	}
	if value.Kind() != '0' {
		d.bad.Add(pointer, WrongType, fmt.Sprintf("%s of a quantity is a number.", name), value)
		return false
	}
	x, err := number(value)
	if err != nil {
		d.bad.Add(pointer, NotFinite, fmt.Sprintf("%s is no number that can be computed with.", f.Path()), value)
		return false
	}
	*target = &x
	return true
}

func (d *decoder) integer(f *Field, at string, raw jsontext.Value) (units.Quantity, bool) {
	if raw.Kind() == '0' {
		if x, err := number(raw); err == nil && x == math.Trunc(x) {
			return units.Quantity{Value: x}, true
		}
	}
	d.bad.Add(at, WrongType, fmt.Sprintf("%s is a whole number.", f.Path()), raw)
	return units.Quantity{}, false
}

func (d *decoder) text(f *Field, at string, raw jsontext.Value) (string, bool) {
	if raw.Kind() != '"' {
		d.bad.Add(at, WrongType, fmt.Sprintf("%s is a string.", f.Path()), raw)
		return "", false
	}
	s := text(raw)
	if f.Rule != "" {
		if err := rules.Var(s, f.Rule); err != nil {
			d.bad.Add(at, OutOfRange, fmt.Sprintf("%s must have %s characters.", f.Path(), RuleText(f)), raw)
			return "", false
		}
	}
	return s, true
}

func (d *decoder) choice(f *Field, at string, raw jsontext.Value) (string, bool) {
	if raw.Kind() != '"' {
		d.bad.Add(at, WrongType, fmt.Sprintf("%s is one of %s.", f.Path(), OrList(f.Options)), raw)
		return "", false
	}
	s := text(raw)
	for _, o := range f.Options {
		if o == s {
			return o, true
		}
	}
	d.bad.Add(at, UnknownChoice, unknown(f.Path(), s, f.Options), raw)
	return "", false
}

func (d *decoder) choices(f *Field, at string, raw jsontext.Value) ([]string, bool) {
	if raw.Kind() != '[' {
		d.bad.Add(at, WrongType, fmt.Sprintf("%s is a list of %s.", f.Path(), OrList(f.Options)), raw)
		return nil, false
	}
	var list []string
	ok := true
	for i, value := range elements(raw) {
		s, good := d.choice(f, at+"/"+strconv.Itoa(i), value)
		ok = ok && good
		list = append(list, s)
	}
	return list, ok
}

func (d *decoder) interval(f *Field, at string, raw jsontext.Value) ([2]units.Quantity, bool) {
	var ends [2]units.Quantity
	want := fmt.Sprintf("%s is a list of the lowest and the highest value.", f.Path())
	if raw.Kind() != '[' {
		d.bad.Add(at, WrongType, want, raw)
		return ends, false
	}
	list := elements(raw)
	if len(list) != 2 {
		d.bad.Add(at, WrongType, want, raw)
		return ends, false
	}
	ok := true
	for i, value := range list {
		pointer := at + "/" + strconv.Itoa(i)
		q, good := d.quantity(f, f.Kind, pointer, value)
		ok = ok && good && d.rule(f, q.Value, pointer, value)
		ends[i] = q
	}
	if ok && ends[0].Value > ends[1].Value {
		d.bad.Add(at, Contradiction, fmt.Sprintf("%s: the lowest value is above the highest.", f.Path()), raw)
		ok = false
	}
	return ends, ok
}

// maxRows is the most objects that a list may have.
const maxRows = 50

// rows reads a list of objects.
func (d *decoder) rows(f *Field, at string, raw jsontext.Value) ([][]Value, bool) {
	if raw.Kind() != '[' {
		d.bad.Add(at, WrongType, fmt.Sprintf("%s is a list of objects.", f.Path()), raw)
		return nil, false
	}
	list := elements(raw)
	if len(list) == 0 || len(list) > maxRows {
		d.bad.Add(at, OutOfRange, fmt.Sprintf("%s has between 1 and %d objects.", f.Path(), maxRows), raw)
		return nil, false
	}
	var rows [][]Value
	for i, value := range list {
		sub := &decoder{schema: d.schema, made: NewCase(d.schema, "")}
		sub.block(f.Row, at+"/"+strconv.Itoa(i), value)
		for _, v := range sub.bad.list {
			d.bad.Add(v.Pointer, v.Code, v.Sentence, []byte(v.Value))
		}
		rows = append(rows, sub.made.given)
	}
	return rows, true
}

// Members goes through the members of an object that is valid JSON, repeated
// names included. The values are the caller's to keep.
func Members(object jsontext.Value) iter.Seq2[string, jsontext.Value] {
	return func(yield func(string, jsontext.Value) bool) {
		dec := jsontext.NewDecoder(bytes.NewBuffer(object), jsontext.AllowDuplicateNames(true))
		if _, err := dec.ReadToken(); err != nil {
			return
		}
		for dec.PeekKind() == '"' {
			name, value, err := member(dec)
			if err != nil || !yield(name, value.Clone()) {
				return
			}
		}
	}
}

func elements(raw jsontext.Value) []jsontext.Value {
	dec := jsontext.NewDecoder(bytes.NewBuffer(raw), jsontext.AllowDuplicateNames(true))
	if _, err := dec.ReadToken(); err != nil {
		return nil
	}
	var list []jsontext.Value
	for dec.PeekKind() != ']' {
		v, err := dec.ReadValue()
		if err != nil {
			return list
		}
		list = append(list, bytes.Clone(v))
	}
	return list
}

func number(raw jsontext.Value) (float64, error) {
	return strconv.ParseFloat(string(raw), 64)
}

// text unquotes a JSON string.
func text(raw jsontext.Value) string {
	if len(raw) >= 2 && bytes.IndexByte(raw, '\\') < 0 {
		return string(raw[1 : len(raw)-1])
	}
	s, err := jsontext.AppendUnquote(nil, raw)
	if err != nil {
		return ""
	}
	return string(s)
}

// names remembers which names were seen.
type names struct{ list []string }

func (n *names) has(name string) bool {
	for _, s := range n.list {
		if s == name {
			return true
		}
	}
	return false
}

func (n *names) again(name string) bool {
	if n.has(name) {
		return true
	}
	n.list = append(n.list, name)
	return false
}

func escape(name string) string {
	if !strings.ContainsAny(name, "~/") {
		return name
	}
	return strings.NewReplacer("~", "~0", "/", "~1").Replace(name)
}
