package input_test

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"
	"testing"

	"github.com/go-json-experiment/json/jsontext"
	"pgregory.net/rapid"

	"regimed/regime/input"
	"regimed/units"
)

// small is a schema with a field of every type.
func small() *input.Schema {
	top := &input.Block{Title: "Case", Fields: []*input.Field{
		{Name: "title", Type: input.Text, Rule: "max=20"},
		{Name: "interest", Type: input.Choices, Options: []string{"load", "sound"}},
	}}
	rod := &input.Block{Name: "rod", Title: "Rod", Fields: []*input.Field{
		{Name: "diameter", Type: input.Quantity, Kind: units.Length, Rule: "gt=0", Needed: true, Doc: "outer diameter"},
		{Name: "frequency", Type: input.Quantity, Kind: units.Frequency, Rule: "gt=0"},
		{Name: "damping", Type: input.Number, Rule: "gte=0,lt=1"},
		{Name: "mode", Type: input.Integer, Rule: "gte=1,lte=10"},
		{Name: "support", Type: input.Choice, Options: []string{"pinned", "clamped"}},
		{Name: "filled", Type: input.Flag},
	}}
	ball := &input.Block{Name: "ball", Title: "Ball", Fields: []*input.Field{
		{Name: "diameter", Type: input.Quantity, Kind: units.Length, Rule: "gt=0"},
	}}
	name := &input.Field{Name: "name", Type: input.Choice, Options: []string{"water", "air"}}
	fluid := &input.Block{Name: "fluid", Title: "Fluid", Shorthand: name, Fields: []*input.Field{name,
		{Name: "temperature", Type: input.Quantity, Kind: units.Temperature, Rule: "gt=0"},
		{Name: "viscosity", Type: input.Quantity, Kind: units.DynamicViscosity, Rule: "gt=0"},
		{Name: "pressure", Type: input.Quantity, Kind: units.Pressure, Rule: "gt=0"},
	}}
	flow := &input.Block{Name: "flow", Title: "Flow", Fields: []*input.Field{
		{Name: "speed", Type: input.Quantity, Kind: units.Speed, Rule: "gte=0"},
		{Name: "operating", Type: input.Interval, Kind: units.Speed, Rule: "gte=0"},
		{Name: "a/b~c", Type: input.Number},
	}}
	return input.NewSchema(top, []*input.Block{rod, ball}, []*input.Block{fluid, flow})
}

const rod = `"structure":{"kind":"rod","diameter":"20 mm"}`

func decode(t *testing.T, text string) (*input.Case, []input.Violation) {
	t.Helper()
	c, bad, err := input.Decode([]byte(text), small())
	if err != nil {
		t.Fatalf("%s: %v", text, err)
	}
	return c, bad
}

// Each mistake gives its code at its place, with a sentence that helps.
func TestViolations(t *testing.T) {
	rows := []struct {
		text    string
		pointer string
		code    input.Code
		says    string
	}{
		{`[]`, "", input.WrongType, "object"},
		{`"rod"`, "", input.WrongType, "object"},
		{`{}`, "/structure", input.MissingField, "structure"},
		{`{"structure":3}`, "/structure", input.WrongType, "object"},
		{`{"structure":{}}`, "/structure/kind", input.MissingField, "rod or ball"},
		{`{"structure":{"kind":3}}`, "/structure/kind", input.WrongType, "rod or ball"},
		{`{"structure":{"kind":"rood"}}`, "/structure/kind", input.UnknownKind, `"rood"`},
		{`{"structure":{"kind":"rod"}}`, "/structure/diameter", input.MissingField, "outer diameter"},
		{`{` + rod + `,"fluids":"air"}`, "/fluids", input.UnknownField, "fluid"},
		{`{` + rod + `,"fluid":{"temprature":"20 degC"}}`, "/fluid/temprature", input.UnknownField, "temperature"},
		{`{"structure":{"kind":"rod","diamter":"20 mm","diameter":"20 mm"}}`, "/structure/diamter", input.UnknownField, "diameter"},
		{`{` + rod + `,"flow":{"a/b":1}}`, "/flow/a~1b", input.UnknownField, "a/b~c"},
		{`{` + rod + `,"fluid":{"name":"watr"}}`, "/fluid/name", input.UnknownChoice, "water"},
		{`{` + rod + `,"fluid":"watr"}`, "/fluid", input.UnknownChoice, "water"},
		{`{` + rod + `,"interest":["load","noise"]}`, "/interest/1", input.UnknownChoice, "sound"},
		{`{` + rod + `,"interest":"load"}`, "/interest", input.WrongType, "list"},
		{`{` + rod + `,"interest":[1]}`, "/interest/0", input.WrongType, "load or sound"},
		{`{` + rod + `,"fluid":3}`, "/fluid", input.WrongType, "object, or a name"},
		{`{` + rod + `,"flow":"fast"}`, "/flow", input.WrongType, "object"},
		{`{` + rod + `,"flow":{"speed":null}}`, "/flow/speed", input.WrongType, "null"},
		{`{` + rod + `,"flow":{"speed":true}}`, "/flow/speed", input.WrongType, "speed"},
		{`{` + rod + `,"flow":{"speed":{"value":"3","unit":"m/s"}}}`, "/flow/speed/value", input.WrongType, "number"},
		{`{` + rod + `,"flow":{"speed":{"value":3,"unit":5}}}`, "/flow/speed/unit", input.WrongType, "string"},
		{`{` + rod + `,"flow":{"speed":{"vlaue":3,"unit":"m/s"}}}`, "/flow/speed/vlaue", input.UnknownField, "value"},
		{`{` + rod + `,"flow":{"operating":"1 m/s"}}`, "/flow/operating", input.WrongType, "lowest"},
		{`{` + rod + `,"flow":{"operating":["1 m/s"]}}`, "/flow/operating", input.WrongType, "lowest"},
		{`{` + rod + `,"flow":{"operating":["1 m/s","2 m/s","3 m/s"]}}`, "/flow/operating", input.WrongType, "lowest"},
		{`{` + rod + `,"flow":{"operating":["1 m/s","-2 m/s"]}}`, "/flow/operating/1", input.OutOfRange, "at least 0"},
		{`{` + rod + `,"flow":{"operating":["3 m/s","2 m/s"]}}`, "/flow/operating", input.Contradiction, "above"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","filled":"yes"}}`, "/structure/filled", input.WrongType, "true or false"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","mode":1.5}}`, "/structure/mode", input.WrongType, "whole number"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","mode":"1"}}`, "/structure/mode", input.WrongType, "whole number"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","mode":11}}`, "/structure/mode", input.OutOfRange, "at most 10"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","support":1}}`, "/structure/support", input.WrongType, "pinned or clamped"},
		{`{"title":3,` + rod + `}`, "/title", input.WrongType, "string"},
		{`{"title":"a title of more than twenty",` + rod + `}`, "/title", input.OutOfRange, "20 characters"},
		{`{` + rod + `,"flow":{"speed":"3 furlongs/day"}}`, "/flow/speed", input.UnknownUnit, "furlongs"},
		{`{` + rod + `,"flow":{"speed":"3 kg"}}`, "/flow/speed", input.WrongDimension, "speed"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","frequency":"3 1/s"}}`, "/structure/frequency", input.WrongMeaning, "Hz"},
		{`{` + rod + `,"flow":{"speed":3}}`, "/flow/speed", input.MissingUnit, "3 m/s"},
		{`{` + rod + `,"flow":{"speed":"three m/s"}}`, "/flow/speed", input.BadQuantity, "number"},
		{`{` + rod + `,"flow":{"speed":{"unit":"m/s"}}}`, "/flow/speed", input.BadQuantity, "value"},
		{`{` + rod + `,"flow":{"speed":"1e999 m/s"}}`, "/flow/speed", input.NotFinite, "finite"},
		{`{` + rod + `,"flow":{"speed":{"value":1e999,"unit":"m/s"}}}`, "/flow/speed/value", input.NotFinite, "computed"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","damping":1e999}}`, "/structure/damping", input.NotFinite, "computed"},
		{`{"structure":{"kind":"rod","diameter":"0 mm"}}`, "/structure/diameter", input.OutOfRange, "greater than 0 m"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","damping":1}}`, "/structure/damping", input.OutOfRange, "less than 1"},
		{`{"structure":{"kind":"rod","diameter":"20 mm","damping":-0.1}}`, "/structure/damping", input.OutOfRange, "at least 0"},
		{`{` + rod + `,` + rod + `}`, "/structure", input.Duplicate, "twice"},
		{`{` + rod + `,"flow":{"speed":"1 m/s","speed":"2 m/s"}}`, "/flow/speed", input.Duplicate, "twice"},
		{`{` + rod + `,"flow":{"speed":{"value":1,"value":2,"unit":"m/s"}}}`, "/flow/speed/value", input.Duplicate, "twice"},
		{`{` + rod + `,"fluid":{"temperature":"-300 degC"}}`, "/fluid/temperature", "below-absolute-zero", "absolute zero"},
		{`{` + rod + `,"flow":{"speed":{"low":3,"high":2,"unit":"m/s"}}}`, "/flow/speed", "bad-range", "m/s"},
		{`{` + rod + `,"flow":{"speed":"3 m/s +- -1 m/s"}}`, "/flow/speed", "negative-uncertainty", "negative"},
		{`{` + rod + `,"fluid":{"viscosity":"1e-6 m2/s"}}`, "/fluid/viscosity", input.WrongMeaning, "kinematic_viscosity"},
	}
	codes := map[input.Code]bool{}
	for _, r := range rows {
		c, bad := decode(t, r.text)
		if c != nil || len(bad) != 1 {
			t.Errorf("%s: %d violations %v", r.text, len(bad), bad)
			continue
		}
		v := bad[0]
		codes[v.Code] = true
		if v.Pointer != r.pointer || v.Code != r.code || !strings.Contains(v.Sentence, r.says) {
			t.Errorf("%s:\n%s %s %q\nwant %s %s, a word of %q", r.text, v.Pointer, v.Code, v.Sentence, r.pointer, r.code, r.says)
		}
	}
	if len(rows) != 55 {
		t.Errorf("%d rows", len(rows))
	}
	for _, code := range []input.Code{input.UnknownField, input.UnknownKind, input.UnknownChoice, input.MissingField, input.WrongType, input.UnknownUnit,
		input.WrongDimension, input.WrongMeaning, input.MissingUnit, input.BadQuantity, input.NotFinite, input.OutOfRange, input.Contradiction, input.Duplicate} {
		if !codes[code] {
			t.Errorf("no row gives %s", code)
		}
	}
}

// Violations come all at once, ordered by place, each with the value as received.
func TestAllViolationsAtOnce(t *testing.T) {
	_, bad := decode(t, `{"titel":"x","structure":{"kind":"rod","mode":0,"support":"glued","damping":2},
		"fluid":{"name":"wather","temperature":20,"pressure":"-1 bar"},"flow":{"operating":["2 m/s","1 m/s"],"speed":"5 kg"}}`)
	want := map[string]input.Code{
		"/titel": input.UnknownField, "/structure/mode": input.OutOfRange, "/structure/support": input.UnknownChoice, "/structure/damping": input.OutOfRange,
		"/structure/diameter": input.MissingField, "/fluid/name": input.UnknownChoice, "/fluid/temperature": input.MissingUnit,
		"/fluid/pressure": input.OutOfRange, "/flow/operating": input.Contradiction, "/flow/speed": input.WrongDimension,
	}
	if len(bad) != len(want) {
		t.Errorf("%d violations, want %d: %v", len(bad), len(want), bad)
	}
	for i, v := range bad {
		if want[v.Pointer] != v.Code {
			t.Errorf("%s: %s, want %s", v.Pointer, v.Code, want[v.Pointer])
		}
		if i > 0 && bad[i-1].Pointer > v.Pointer {
			t.Errorf("%s stands before %s", bad[i-1].Pointer, v.Pointer)
		}
		if v.Value != "" && !jsontext.Value(v.Value).IsValid() || (v.Value == "") != (v.Code == input.MissingField) {
			t.Errorf("%s: value %q", v.Pointer, v.Value)
		}
	}
}

// After a hundred violations one more says that there are others; a long value is not echoed.
func TestManyViolations(t *testing.T) {
	var b strings.Builder
	for i := range 150 {
		fmt.Fprintf(&b, `"nothing%d":1,`, i)
	}
	_, bad := decode(t, `{`+b.String()+rod+`}`)
	if len(bad) != 101 || bad[100].Code != input.TooMany {
		t.Errorf("%d violations, the last %s", len(bad), bad[len(bad)-1].Code)
	}
	long := strings.Repeat("x", 5000)
	_, bad = decode(t, `{`+rod+`,"title":"`+long+`","`+long+`":1}`)
	if len(bad) != 2 {
		t.Fatalf("%d violations", len(bad))
	}
	for _, v := range bad {
		if len(v.Value) > 200 || len(v.Sentence) > 300 || !jsontext.Value(v.Value).IsValid() {
			t.Errorf("%.40s…: a value of %d bytes, a sentence of %d", v.Pointer, len(v.Value), len(v.Sentence))
		}
	}
}

func TestSyntaxErrors(t *testing.T) {
	rows := []struct {
		text   string
		offset int64
	}{
		{``, 0}, {`{`, 1}, {`{"structure"`, 12}, {`{"structure":{"kind":"rod"`, 26}, {`{"a":1,}`, 7}, {`{'a':1}`, 1},
		{`{` + rod + `} x`, 49}, {`{` + rod + `}{}`, 48}, {`nul`, 3}, {"{\"a\":\"\xff\"}", 6}, {`{"a":01}`, 6},
	}
	for _, r := range rows {
		c, bad, err := input.Decode([]byte(r.text), small())
		var syntax *input.SyntaxError
		if !errors.As(err, &syntax) || c != nil || bad != nil {
			t.Errorf("%q: %v %v %v", r.text, c, bad, err)
			continue
		}
		if math.Abs(float64(syntax.Offset-r.offset)) > 2 || !strings.Contains(syntax.Sentence, "no valid JSON at byte") {
			t.Errorf("%q: byte %d, want about %d: %s", r.text, syntax.Offset, r.offset, syntax.Sentence)
		}
	}
	if len(rows) != 11 {
		t.Errorf("%d rows", len(rows))
	}
}

// What was given arrives: in SI, with its uncertainty, and in the order in which it came.
func TestDecodeKeepsWhatWasGiven(t *testing.T) {
	c, bad := decode(t, `{"title":"t","structure":{"diameter":"2 cm","kind":"rod","mode":3,"damping":"2 %","support":"clamped","filled":true,"frequency":"600 rpm"},
		"fluid":"air","flow":{"speed":"3.6 km/h +- 10 %","operating":["0 m/s",{"value":36,"unit":"km/h"}]},"interest":["sound"]}`)
	if len(bad) > 0 {
		t.Fatal(bad)
	}
	s := small()
	find := func(name string) *input.Value {
		i := slices.IndexFunc(c.Given(), func(v input.Value) bool { return v.Field.Path() == name })
		if i < 0 {
			t.Fatalf("%s is lost", name)
		}
		return &c.Given()[i]
	}
	near := func(name string, got, want float64) {
		if math.Abs(got/want-1) > 1e-14 {
			t.Errorf("%s is %g, want %g", name, got, want)
		}
	}
	near("diameter", find("structure.diameter").Q.Value, 0.02)
	near("damping", find("structure.damping").Q.Value, 0.02)
	near("frequency", find("structure.frequency").Q.Value, 10)
	near("speed", find("flow.speed").Q.Value, 1)
	near("deviation of the speed", find("flow.speed").Q.Spread, 0.1)
	near("mode", find("structure.mode").Q.Value, 3)
	near("highest speed", find("flow.operating").Ends[1].Value, 10)
	if v := find("flow.operating"); v.Ends[0].Value != 0 {
		t.Errorf("lowest speed %g", v.Ends[0].Value)
	}
	if c.Kind != "rod" || find("fluid.name").Text != "air" || find("structure.support").Text != "clamped" || !find("structure.filled").Flag ||
		!slices.Equal(find("interest").List, []string{"sound"}) || find("title").Text != "t" || find("flow.speed").Q.Form != units.Normal {
		t.Errorf("%+v", c.Given())
	}
	if len(c.Given()) != 11 || !c.HasBlock("flow") || c.HasBlock("motion") || c.HasBlock("") != true {
		t.Errorf("%d fields given", len(c.Given()))
	}
	if f := s.Block("flow").Find("a/b~c"); f.Pointer() != "/flow/a/b~c" && f.Pointer() != "/flow/a~1b~0c" || f.Path() != "flow.a/b~c" {
		t.Errorf("pointer %s", f.Pointer())
	}
}

// A case with one value changed or taken away is another case; the first stays.
func TestWithAndWithout(t *testing.T) {
	schema := small()
	c, _, err := input.Decode([]byte(`{`+rod+`,"flow":{"speed":"1 m/s"}}`), schema)
	if err != nil {
		t.Fatal(err)
	}
	speed, mode := schema.Block("flow").Find("speed"), schema.Kind("rod").Find("mode")
	d := c.With(input.Value{Field: speed, Q: units.Quantity{Value: 2}}).With(input.Value{Field: mode, Q: units.Quantity{Value: 4}})
	e := d.Without(speed)
	if c.X(speed) != 1 || d.X(speed) != 2 || !math.IsNaN(e.X(speed)) || c.Has(mode) || d.X(mode) != 4 || e.X(mode) != 4 {
		t.Errorf("speeds %g, %g, %g; modes %g, %g, %g", c.X(speed), d.X(speed), e.X(speed), c.X(mode), d.X(mode), e.X(mode))
	}
	if c.Choice(schema.Block("fluid").Find("name"), "none") != "none" || !c.Flag(schema.Kind("rod").Find("filled"), true) {
		t.Error("what was not given has a value")
	}
}

// The digest depends on what is said and not on how it is written.
func TestDigestOfSpellings(t *testing.T) {
	same := []string{
		`{"structure":{"kind":"rod","diameter":{"value":0.5,"unit":"m"},"mode":2},"flow":{"speed":"2 m/s","operating":["0 m/s","4 m/s"]},"fluid":"air"}`,
		`{"fluid":{"name":"air"},"flow":{"operating":["0 m/s","4 m/s"],"speed":"2 m/s"},"structure":{"mode":2,"diameter":"0.5 m","kind":"rod"}}`,
		`{"structure":{"kind":"rod","diameter":"500 mm","mode":2},"flow":{"speed":"2000 mm/s","operating":["0 km/s","400 cm/s"]},"fluid":"air"}`,
		` { "structure" : {"kind":"rod", "diameter":"0.0005 km", "mode":2.0 } , "flow":{"speed":"7.2 km/h","operating":["0 kn","14.4 km/h"]},"fluid":"\u0061ir"}`,
		`{"structure":{"kind":"rod","diameter":"5e-1 m","mode":2},"flow":{"speed":{"value":2.0,"unit":"m s-1"},"operating":["0 m/s","+4 m/s"]},"fluid":"air"}`,
	}
	other := []string{
		`{"structure":{"kind":"rod","diameter":"0.5 m","mode":2},"flow":{"speed":"2 m/s","operating":["0 m/s","4 m/s"]},"fluid":"water"}`,
		`{"structure":{"kind":"rod","diameter":"0.5 m","mode":3},"flow":{"speed":"2 m/s","operating":["0 m/s","4 m/s"]},"fluid":"air"}`,
		`{"structure":{"kind":"rod","diameter":"0.5 m","mode":2},"flow":{"speed":"2 m/s +- 1 %","operating":["0 m/s","4 m/s"]},"fluid":"air"}`,
		`{"structure":{"kind":"rod","diameter":"0.5 m","mode":2},"flow":{"speed":"2 m/s","operating":["1 m/s","4 m/s"]},"fluid":"air"}`,
		`{"structure":{"kind":"rod","diameter":"0.5 m","mode":2},"flow":{"speed":"2 m/s","operating":["0 m/s","4 m/s"]}}`,
		`{"title":"x","structure":{"kind":"rod","diameter":"0.5 m","mode":2},"flow":{"speed":"2 m/s","operating":["0 m/s","4 m/s"]},"fluid":"air"}`,
	}
	digest := func(text string) string {
		c, bad := decode(t, text)
		if len(bad) > 0 {
			t.Fatalf("%s: %v", text, bad)
		}
		return c.Digest()
	}
	first := digest(same[0])
	if len(first) != 64 {
		t.Errorf("digest %q", first)
	}
	for _, text := range same[1:] {
		if digest(text) != first {
			t.Errorf("another digest of %s", text)
		}
	}
	seen := map[string]bool{first: true}
	for _, text := range other {
		if d := digest(text); seen[d] {
			t.Errorf("the same digest of %s", text)
		} else {
			seen[d] = true
		}
	}
	if len(same) != 5 || len(other) != 6 {
		t.Errorf("%d and %d rows", len(same), len(other))
	}
}

// The order of fields and blocks never shows in the canonical case.
func TestCanonicalOfAnyOrder(t *testing.T) {
	structure := []string{`"kind":"rod"`, `"diameter":"0.25 m"`, `"mode":2`, `"damping":0.01`, `"support":"clamped"`, `"filled":false`}
	fluid := []string{`"name":"air"`, `"temperature":"20 degC"`, `"pressure":"1 bar"`}
	flow := []string{`"speed":"2 m/s"`, `"operating":["0 m/s","4 m/s"]`, `"a/b~c":1`}
	object := func(t *rapid.T, members []string) string {
		return "{" + strings.Join(rapid.Permutation(members).Draw(t, "members"), ",") + "}"
	}
	first := ""
	rapid.Check(t, func(t *rapid.T) {
		text := object(t, []string{`"structure":` + object(t, structure), `"fluid":` + object(t, fluid), `"flow":` + object(t, flow), `"title":"t"`, `"interest":["load"]`})
		c, bad, err := input.Decode([]byte(text), small())
		if err != nil || len(bad) > 0 {
			t.Fatalf("%s: %v %v", text, err, bad)
		}
		out := string(c.Canonical(nil))
		if first == "" {
			first = out
		}
		if out != first {
			t.Fatalf("%s\n%s\n%s", text, out, first)
		}
		again := jsontext.Value(out)
		if err := again.Canonicalize(); err != nil || string(again) != out {
			t.Fatalf("not canonical: %v\n%s\n%s", err, out, again)
		}
	})
	if !strings.Contains(first, `"kind":"rod"`) {
		t.Errorf("canonical case %s", first)
	}
}

func TestNearest(t *testing.T) {
	known := []string{"diameter", "radius", "length", "wall_thickness", "mass_per_length", "young_modulus"}
	rows := []struct {
		name string
		want string // the first; empty: none
	}{
		{"diameter", "diameter"}, {"diamter", "diameter"}, {"Diameter", "diameter"}, {"dimaeter", "diameter"}, {"lenght", "length"},
		{"raduis", "radius"}, {"mass", "mass_per_length"}, {"modulus", "young_modulus"}, {"wall-thickness", "wall_thickness"},
		{"velocity", ""}, {"", ""}, {"qqqqqqqq", ""},
	}
	for _, r := range rows {
		near := input.Nearest(r.name, known)
		if r.want == "" && len(near) != 0 || r.want != "" && (len(near) == 0 || near[0] != r.want) || len(near) > 3 {
			t.Errorf("near to %q are %v, want %q", r.name, near, r.want)
		}
	}
	if len(rows) != 12 {
		t.Errorf("%d rows", len(rows))
	}
}

// The rule of a field is said in words, with the unit of its kind.
func TestRuleText(t *testing.T) {
	rows := []struct {
		f    input.Field
		want string
	}{
		{input.Field{Type: input.Quantity, Kind: units.Length, Rule: "gt=0"}, "greater than 0 m"},
		{input.Field{Type: input.Quantity, Kind: units.Angle, Rule: "gte=-1.6,lte=1.6"}, "at least -1.6 rad and at most 1.6 rad"},
		{input.Field{Type: input.Number, Rule: "gte=0,lt=1"}, "at least 0 and less than 1"},
		{input.Field{Type: input.Text, Rule: "max=200"}, "at most 200"},
	}
	for _, r := range rows {
		if got := input.RuleText(&r.f); got != r.want {
			t.Errorf("%s: %q, want %q", r.f.Rule, got, r.want)
		}
	}
	if len(rows) != 4 {
		t.Errorf("%d rows", len(rows))
	}
}
