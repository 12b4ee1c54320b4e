package whatif

import (
	"context"
	"os"
	"path/filepath"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime/input"
	"regimed/units"
)

// shippedJSON are the demonstration cases in JSON.
func shippedJSON(t *testing.T) []*input.Case {
	t.Helper()
	files, err := filepath.Glob("../../testdata/cases/*.json")
	if err != nil {
		t.Fatal(err)
	}
	var list []*input.Case
	for _, f := range files {
		doc, err := os.ReadFile(f)
		if err != nil {
			t.Fatal(err)
		}
		list = append(list, uncertainCase(t, string(doc)))
	}
	if len(list) < 40 {
		t.Fatalf("only %d cases", len(list))
	}
	return list
}

// Whatever is uncertain in a case of any kind, and however wide, the probabilities
// of its answer are probabilities and its quantiles finite.
func TestUncertainCasesOfAnyKind(t *testing.T) {
	cases := shippedJSON(t)
	kinds, none, more := map[string]bool{}, 0, 0
	rapid.Check(t, func(rt *rapid.T) {
		c := rapid.SampledFrom(cases).Draw(rt, "case").Clone()
		for range rapid.IntRange(1, 4).Draw(rt, "inputs") {
			p := rapid.SampledFrom(c.Places()).Draw(rt, "place")
			if p.Field.Type == input.Integer {
				continue
			}
			q := c.At(p)
			q.Form = rapid.SampledFrom([]units.Form{units.Normal, units.Uniform}).Draw(rt, "form")
			q.Spread = max(q.Value, -q.Value, 1e-3) * rapid.SampledFrom([]float64{1e-9, 0.01, 0.1, 0.5, 3, 1e6, 1e300}).Draw(rt, "spread")
		}
		a, bad, err := Classify(context.Background(), c, Options{Samples: MinSamples})
		if err != nil || len(bad) > 0 {
			rt.Fatalf("%v %+v", err, bad)
		}
		defer a.Release()
		s := a.Spread
		if s == nil {
			none++
			return
		}
		kinds[c.Kind] = true
		if s.Samples+s.Outside != MinSamples {
			rt.Fatalf("%d judged, %d outside", s.Samples, s.Outside)
		}
		if s.Outside > 0 {
			more++
		}
		if where := improbable(s); where != "" {
			rt.Fatalf("%s, inputs %v", where, s.Inputs)
		}
	})
	if len(kinds) < 10 || none > 20 || more < 10 {
		t.Errorf("%d kinds; %d cases without an uncertain input, %d with draws outside", len(kinds), none, more)
	}
}
