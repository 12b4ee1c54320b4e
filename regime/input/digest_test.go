package input_test

import (
	"testing"

	"github.com/go-json-experiment/json/jsontext"
	"pgregory.net/rapid"

	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/units"
)

// Whatever is given, the canonical case is already what RFC 8785 makes of it.
func TestCanonicalIsCanonical(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		k := rapid.SampledFrom(kind.Schema().Kinds).Draw(t, "kind")
		c := input.NewCase(kind.Schema(), k.Name)
		blocks := append([]*input.Block{k, kind.Schema().Top}, kind.Schema().Blocks...)
		for _, b := range blocks {
			for _, f := range b.Fields {
				if rapid.IntRange(0, 2).Draw(t, f.Path()) == 0 {
					c = c.With(drawValue(t, f))
				}
			}
		}
		out := c.Canonical(nil)
		again := jsontext.Value(append([]byte(nil), out...))
		if err := again.Canonicalize(); err != nil {
			t.Fatalf("%v in %s", err, out)
		}
		if string(again) != string(out) {
			t.Fatalf("not canonical:\n%s\n%s", out, again)
		}
	})
}

func drawValue(t *rapid.T, f *input.Field) input.Value {
	number := func() units.Quantity {
		return units.Quantity{Value: rapid.Float64Range(-1e300, 1e300).Draw(t, "x"), Form: units.Form(rapid.IntRange(0, 2).Draw(t, "form")),
			Spread: rapid.Float64Range(0, 1e-3).Draw(t, "spread"), Gauge: rapid.Bool().Draw(t, "gauge")}
	}
	v := input.Value{Field: f}
	switch f.Type {
	case input.Quantity, input.Number, input.Integer:
		v.Q = number()
	case input.Interval:
		v.Ends = [2]units.Quantity{number(), number()}
	case input.Text, input.Choice:
		v.Text = rapid.String().Draw(t, "text")
	case input.Choices:
		v.List = rapid.SliceOf(rapid.String()).Draw(t, "list")
	case input.Flag:
		v.Flag = rapid.Bool().Draw(t, "flag")
	}
	return v
}
