package input_test

import (
	"errors"
	"math"
	"testing"
	"unicode/utf8"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/input"
	"regimed/regime/kind"
)

// FuzzDecode: no document makes a panic, a case with a number that is none, a
// violation without a place to look at, or a canonical form that is no JSON.
func FuzzDecode(f *testing.F) {
	for _, s := range []string{
		``, `{}`, `[]`, `null`, `{"structure":{}}`, `{"structure":{"kind":"cylinder","diameter":"20 mm"}}`,
		`{"structure":{"kind":"plate","length":{"value":1,"unit":"m"},"width":"1 m","edges":"SSSS","mode_m":1},"fluid":"water"}`,
		`{"structure":{"kind":"generic","length":"1 .. 2 m","damping_ratio":"2 %"},"flow":{"operating":["0 m/s","5 m/s +- 1 %"],"direction":"cross"},"interest":["load","load"]}`,
		`{"structure":{"kind":"generic","length":{"low":1,"high":2,"unit":"m"}},"fluid":{"name":"air","pressure":"2 barg"},"tolerance":"design","given_groups":{"mach":0.3}}`,
		`{"structure":{"kind":"cylinder","kind":"plate"},"structure":1}`, `{"title":"\ud83d\ude00\u0000","structure":{"kind":"cylinder"}}`,
		`{"structure":{"kind":"cylinder","diameter":1e999,"radius":"NaN m","length":"1e308 km"}}`, "{\"\xff\":1}", `{"a":1}{"b":2}`,
	} {
		f.Add([]byte(s))
	}
	schema := kind.Schema()
	f.Fuzz(func(t *testing.T, data []byte) {
		c, bad, err := input.Decode(data, schema)
		var syntax *input.SyntaxError
		switch {
		case err != nil:
			if !errors.As(err, &syntax) || c != nil || bad != nil || syntax.Sentence == "" || syntax.Offset < 0 || syntax.Offset > int64(len(data)) {
				t.Fatalf("%v, %v, %#v", c, bad, err)
			}
		case len(bad) > 0:
			if c != nil {
				t.Fatal("a case and violations")
			}
			for _, v := range bad {
				checkViolation(t, v)
			}
		default:
			checkCase(t, c)
		}
	})
}

func checkViolation(t *testing.T, v input.Violation) {
	t.Helper()
	if v.Code == "" || v.Sentence == "" || !utf8.ValidString(v.Sentence) || v.Pointer != "" && v.Pointer[0] != '/' {
		t.Fatalf("%+v", v)
	}
	if v.Value != "" && !jsontext.Value(v.Value).IsValid(jsontext.AllowDuplicateNames(true)) {
		t.Fatalf("value %q is no JSON", v.Value)
	}
}

func checkCase(t *testing.T, c *input.Case) {
	t.Helper()
	if c == nil || kind.Schema().Kind(c.Kind) == nil {
		t.Fatalf("%+v", c)
	}
	for _, v := range c.Given() {
		for _, x := range []float64{v.Q.Value, v.Q.Spread, v.Ends[0].Value, v.Ends[1].Value} {
			if math.IsNaN(x) || math.IsInf(x, 0) {
				t.Fatalf("%s has a number that is none", v.Field.Path())
			}
		}
	}
	out := jsontext.Value(c.Canonical(nil))
	again := append(jsontext.Value(nil), out...)
	if err := again.Canonicalize(); err != nil || string(again) != string(out) {
		t.Fatalf("canonical form %s: %v", out, err)
	}
	if len(c.Digest()) != 64 {
		t.Fatalf("digest %q", c.Digest())
	}
}
