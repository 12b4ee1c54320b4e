package api

import (
	"bytes"
	"net/http"
	"os"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/santhosh-tekuri/jsonschema/v6"
	"pgregory.net/rapid"

	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/units"
)

// compiled is the schema of a case as a validator takes it.
var compiled = compile(CaseSchema())

func compile(schema []byte) *jsonschema.Schema {
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(schema))
	if err != nil {
		panic(err)
	}
	c := jsonschema.NewCompiler()
	c.DefaultDraft(jsonschema.Draft2020)
	if err := c.AddResource("urn:regimed:schema:case", doc); err != nil {
		panic(err)
	}
	return c.MustCompile("urn:regimed:schema:case")
}

func validates(t testing.TB, body []byte) error {
	t.Helper()
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(body))
	if err != nil {
		t.Fatalf("%v: %s", err, body)
	}
	return compiled.Validate(doc)
}

func TestSchemaIsServed(t *testing.T) {
	if body := bodyOf(t, call(t, http.MethodGet, "/v1/schema/case", "")); !bytes.Equal(body, CaseSchema()) {
		t.Error("what is served is another schema")
	}
}

// The schema is one: it holds against the schema of schemas.
func TestSchemaHoldsAgainstItsMetaschema(t *testing.T) {
	doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(CaseSchema()))
	if err != nil {
		t.Fatal(err)
	}
	meta, err := jsonschema.NewCompiler().Compile("https://json-schema.org/draft/2020-12/schema")
	if err != nil {
		t.Fatal(err)
	}
	if err := meta.Validate(doc); err != nil {
		t.Error(err)
	}
}

// Every case that is shipped holds against the schema.
func TestSchemaTakesShippedCases(t *testing.T) {
	ran := 0
	for _, file := range shippedCases(t) {
		if err := validates(t, caseIn(t, file)); err != nil {
			t.Errorf("%s: %v", file, err)
		}
		ran++
	}
	if err := validates(t, []byte(riser)); err != nil {
		t.Error(err)
	}
	if ran < 3 {
		t.Errorf("%d cases", ran)
	}
}

// caseIn reads the case of a file: the whole of it, or its member "case".
func caseIn(t testing.TB, file string) []byte {
	t.Helper()
	body, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	var situation struct {
		Case jsontext.Value `json:"case"`
	}
	if err := json.Unmarshal(body, &situation); err == nil && situation.Case != nil {
		return situation.Case
	}
	return body
}

// What the schema can know is refused by it, as by the server.
func TestSchemaRefuses(t *testing.T) {
	// What only the server can judge: ranges of texts with units, physics, and
	// duplicates, which a validator never sees.
	onlyServer := []string{"unknown unit", "wrong dimension", "ambiguous unit", "bare rate", "text beyond a double", "negative length", "no length",
		"below absolute zero", "above the range of the fluid", "range upside down", "negative uncertainty", "no diameter", "flow without fluid", "two radii",
		"wall thicker than the radius", "gauge pressure alone", "field twice", "block twice", "structure twice", "member of a quantity twice",
		"ends in the wrong order", "number beyond a double", "number beyond a double in an object"}
	ran := 0
	for _, row := range badCases {
		if slices.Contains(onlyServer, row.name) {
			continue
		}
		ran++
		if validates(t, []byte(row.body)) == nil {
			t.Errorf("%s: the schema takes %s", row.name, row.body)
		}
	}
	if ran != len(badCases)-len(onlyServer) {
		t.Errorf("%d rows", ran)
	}
}

// Each example and default in the schema is one that the decoder takes.
func TestSchemaExamplesDecode(t *testing.T) {
	ran := 0
	s := kind.Schema()
	for _, k := range s.Kinds {
		base := minimal(k)
		for _, b := range append([]*input.Block{s.Top, k}, s.Blocks...) {
			for _, f := range b.Fields {
				values := examples(f)
				if d, ok := defaultOf(f); ok {
					values = append(values, d)
				}
				for _, v := range values {
					checkExample(t, s, base, f, v)
					ran++
				}
			}
		}
	}
	if ran < 100 {
		t.Errorf("%d examples", ran)
	}
	for _, k := range units.Kinds() {
		for _, v := range quantityExamples(k) {
			if text, ok := v.(string); ok {
				if _, err := units.Parse(text, k); err != nil {
					t.Errorf("%s: %v", k, err)
				}
			}
		}
	}
}

// minimal is a structure with the needed fields of its kind only.
func minimal(k *input.Block) OrderedMembers {
	o := OrderedMembers{{"kind", k.Name}}
	for _, f := range k.Fields {
		if f.Needed {
			o = o.with(f.Name, examples(f)[0])
		}
	}
	return o
}

func checkExample(t *testing.T, s *input.Schema, structure OrderedMembers, f *input.Field, v any) {
	t.Helper()
	body, err := json.Marshal(placed(structure, f, v))
	if err != nil {
		t.Fatal(err)
	}
	if _, violations, err := input.Decode(body, s); err != nil || len(violations) > 0 {
		t.Errorf("%s: %v %v %s", f.Path(), err, violations, body)
	}
	if err := validates(t, body); err != nil {
		t.Errorf("%s: %v", body, err)
	}
}

// placed is a case with a structure and one field more.
func placed(structure OrderedMembers, f *input.Field, v any) OrderedMembers {
	structure = slices.DeleteFunc(slices.Clone(structure), func(m Member) bool { return f.Of == "structure" && m.Name == f.Name })
	switch f.Of {
	case "structure":
		return OrderedMembers{{"structure", structure.with(f.Name, v)}}
	case "":
		return OrderedMembers{{"structure", structure}, {f.Name, v}}
	}
	return OrderedMembers{{"structure", structure}, {f.Of, OrderedMembers{{f.Name, v}}}}
}

// What the decoder accepts the schema accepts, and a field that one does not
// know the other does not know either.
func TestSchemaTakesWhatTheDecoderTakes(t *testing.T) {
	s := kind.Schema()
	accepted, refused := 0, 0
	rapid.Check(t, func(t *rapid.T) {
		body, err := json.Marshal(drawCase(t, s))
		if err != nil {
			t.Fatal(err)
		}
		_, violations, err := input.Decode(body, s)
		if err != nil {
			t.Fatal(err)
		}
		doc, err := jsonschema.UnmarshalJSON(bytes.NewReader(body))
		if err != nil {
			t.Fatal(err)
		}
		bySchema := compiled.Validate(doc)
		if len(violations) == 0 {
			accepted++
			if bySchema != nil {
				t.Fatalf("%v: %s", bySchema, body)
			}
			return
		}
		refused++
		if onPresence(violations) && bySchema == nil {
			t.Fatalf("the schema takes what the decoder refuses: %v %s", violations, body)
		}
	})
	if accepted < 10 || refused < 10 {
		t.Errorf("%d accepted, %d refused", accepted, refused)
	}
}

// onPresence reports whether a violation concerns which fields there are.
func onPresence(vs []input.Violation) bool {
	return slices.ContainsFunc(vs, func(v input.Violation) bool {
		return v.Code == input.UnknownField || v.Code == input.MissingField || v.Code == input.UnknownKind || v.Code == input.UnknownChoice || v.Code == input.WrongType
	})
}

// drawCase draws a case from the schema: usually right, now and then with a
// field left out, a name misspelt or a value of another type.
func drawCase(t *rapid.T, s *input.Schema) OrderedMembers {
	k := rapid.SampledFrom(s.Kinds).Draw(t, "kind")
	structure := append(OrderedMembers{{"kind", k.Name}}, drawFields(t, k)...)
	c := OrderedMembers{{"structure", structure}}
	c = append(c, drawFields(t, s.Top)...)
	for _, b := range s.Blocks {
		switch {
		case !rapid.Bool().Draw(t, b.Name):
		case b.Shorthand != nil && rapid.Bool().Draw(t, "shorthand"):
			c = c.with(b.Name, drawValue(t, b.Shorthand))
		default:
			c = c.with(b.Name, drawFields(t, b))
		}
	}
	return c
}

func drawFields(t *rapid.T, b *input.Block) OrderedMembers {
	o := OrderedMembers{}
	for _, f := range b.Fields {
		if !f.Needed && rapid.IntRange(0, 3).Draw(t, f.Name) > 0 || f.Needed && rare(t) {
			continue
		}
		name := f.Name
		if rare(t) {
			name += "s"
		}
		if !slices.ContainsFunc(o, func(m Member) bool { return m.Name == name }) {
			o = o.with(name, drawValue(t, f))
		}
	}
	return o
}

// rare is true once in a while. Drawn numbers crowd at the ends of their range.
func rare(t *rapid.T) bool { return rapid.IntRange(0, 60).Draw(t, "rare") == 37 }

// drawValue draws a value of a field in one of the forms that it may have.
func drawValue(t *rapid.T, f *input.Field) any {
	if rare(t) {
		return rapid.SampledFrom([]any{nil, true, "wrong", []string{"wrong"}, OrderedMembers{}}).Draw(t, "other")
	}
	switch f.Type {
	case input.Quantity:
		return drawQuantity(t, f.Kind.Example())
	case input.Number:
		return drawQuantity(t, strconv.FormatFloat(examples(f)[0].(float64), 'g', -1, 64))
	case input.Interval:
		return []any{"0 " + f.Kind.SI(), drawQuantity(t, f.Kind.Example())}
	case input.Choice:
		return rapid.SampledFrom(f.Options).Draw(t, "option")
	case input.Choices:
		return rapid.SliceOfN(rapid.SampledFrom(f.Options), 0, 3).Draw(t, "options")
	}
	return rapid.SampledFrom(examples(f)).Draw(t, "example")
}

// drawQuantity writes a quantity in one of the ways in which it can be written.
func drawQuantity(t *rapid.T, text string) any {
	number, unit, _ := strings.Cut(text, " ")
	x, err := strconv.ParseFloat(number, 64)
	if err != nil {
		t.Fatal(err)
	}
	full := OrderedMembers{{"value", x}}
	ends := OrderedMembers{{"low", x}, {"high", 1.01 * x}}
	if unit != "" {
		full, ends = full.with("unit", unit), ends.with("unit", unit)
	}
	above := strconv.FormatFloat(1.01*x, 'g', -1, 64)
	forms := []any{text, " " + text + "\t", number + " .. " + above + " " + unit, number + " ± 0.001 " + unit, text + " +- 5 %",
		"(" + number + " ± 0.001) " + unit, "+" + text, full, ends, slices.Clone(full).with("percent", 5), slices.Clone(full).with("std", x/10)}
	if unit == "" {
		forms = append(forms, x, strconv.FormatFloat(100*x, 'g', -1, 64)+" %")
	}
	return rapid.SampledFrom(forms).Draw(t, "form")
}

// A quantity in every unit that the server knows passes as text, and a number
// without a unit passes only where the quantity is a pure number.
func TestSchemaTakesEveryUnit(t *testing.T) {
	ran := 0
	bare, withUnit := regexp.MustCompile(patternBare), regexp.MustCompile(patternUnit)
	for _, u := range units.Table() {
		for _, symbol := range append([]string{u.Symbol}, u.Aliases...) {
			if symbol == "1" {
				continue // the unit of a pure number
			}
			for _, number := range []string{"1.5 ", "-2e-3", "−4", ".5 ", "(2 ± 1) ", "1 .. 2 "} {
				ran++
				if text := number + symbol; !withUnit.MatchString(text) || !bare.MatchString(text) {
					t.Errorf("%q does not pass", text)
				}
			}
		}
	}
	for _, text := range []string{"1.5", "-3", "2 .. 3", "2 ± 0.1", "", "length"} {
		if withUnit.MatchString(text) {
			t.Errorf("%q passes as a quantity with a unit", text)
		}
	}
	if ran < 500 {
		t.Errorf("%d texts", ran)
	}
}
