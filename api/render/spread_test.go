package render

import (
	"context"
	"maps"
	"math"
	"slices"
	"strings"
	"testing"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

const uncertainPile = `{"title": "pile in the ebb", "structure": {"kind": "cylinder", "diameter": "0.3 m", "mass_per_length": "145 kg/m", "frequency_dry": "5 Hz",
	"damping_ratio": "0.002 .. 0.02"}, "fluid": {"name": "seawater", "temperature": "10 degC +- 3 K"}, "flow": {"speed": "1.4 m/s +- 20 %"}}`

// spread is an answer to the pile in the ebb, with how it spreads.
func spread(t testing.TB) *regime.Answer {
	t.Helper()
	c, bad, err := input.Decode([]byte(uncertainPile), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("%v %+v", err, bad)
	}
	a, bad, err := whatif.Classify(context.Background(), c, whatif.Options{Samples: 256})
	if err != nil || len(bad) > 0 {
		t.Fatalf("%v %+v", err, bad)
	}
	return a
}

// beyond is the same answer had every draw been left out.
func beyond(t testing.TB) *regime.Answer {
	t.Helper()
	a := spread(t)
	a.Spread = &regime.Spread{Inputs: a.Spread.Inputs, Outside: 256, Refusals: []int{0, 0, 256}}
	return a
}

func TestSpreadInJSON(t *testing.T) {
	a := spread(t)
	doc := decode(t, a)
	u := doc["uncertainty"].(map[string]any)
	want := []map[string]any{
		{"input": "flow.speed", "pointer": "/flow/speed", "form": "normal", "value": 1.4, "spread": 1.4 * 0.2, "unit": "m/s"},
		{"input": "fluid.temperature", "pointer": "/fluid/temperature", "form": "normal", "value": 283.15, "spread": 3.0, "unit": "K"},
		{"input": "structure.damping_ratio", "pointer": "/structure/damping_ratio", "form": "uniform", "value": 0.011, "spread": 0.009, "unit": "1"},
	}
	inputs := u["inputs"].([]any)
	if len(inputs) != len(want) || u["samples"] != 256.0 || u["outside"] != 0.0 || u["settled"] != a.Spread.Settled {
		t.Fatalf("%v", u)
	}
	for i, w := range want {
		got := inputs[i].(map[string]any)
		for key, x := range w {
			y, isNumber := x.(float64)
			if same := got[key] == x || isNumber && math.Abs(got[key].(float64)/y-1) < 1e-12; !same || len(got) != len(w) {
				t.Errorf("%s of input %d is %v, want %v", key, i, got[key], x)
			}
		}
	}
	recommended := doc["recommendation"].(map[string]any)
	p, e := recommended["probability"].(map[string]any), recommended["standard_error"].(map[string]any)
	if sum := total(p); len(p) < 2 || math.Abs(sum-1) > 1e-12 || !slices.Equal(slices.Sorted(maps.Keys(p)), slices.Sorted(maps.Keys(e))) {
		t.Errorf("probabilities %v, standard errors %v", p, e)
	}
	quantiles := 0
	for id, f := range doc["findings"].(map[string]any) {
		f := f.(map[string]any)
		p, e := f["probability"].(map[string]any), f["standard_error"].(map[string]any)
		if sum := total(p); math.Abs(sum-1) > 1e-12 || len(p) < 3 || len(p) != len(e) {
			t.Errorf("%s: %v ± %v", id, p, e)
		}
		if rises(t, id, f["quantiles"]) {
			quantiles++
		}
	}
	reynolds := doc["groups"].(map[string]any)["reynolds"].(map[string]any)
	if !rises(t, "reynolds", reynolds["quantiles"]) || quantiles < 5 {
		t.Errorf("%d findings have quantiles, Reynolds %v", quantiles, reynolds)
	}
}

func total(shares map[string]any) (sum float64) {
	for _, x := range shares {
		sum += x.(float64)
	}
	return sum
}

// rises reports whether there are quantiles, and checks their order.
func rises(t *testing.T, what string, quantiles any) bool {
	t.Helper()
	if quantiles == nil {
		return false
	}
	q := quantiles.([]any)
	if len(q) != 3 || q[0].(float64) > q[1].(float64) || q[1].(float64) > q[2].(float64) {
		t.Errorf("%s: %v", what, q)
	}
	return true
}

// Of a certain case nothing is said of a spread; nor of an uncertain one of which no
// draw could be judged, but that it is so.
func TestNoSpreadInJSON(t *testing.T) {
	for name, a := range map[string]*regime.Answer{"certain": classify(t, classified["riser"]), "beyond": beyond(t)} {
		keys := map[string]bool{}
		keysOf(keys, "", decode(t, a))
		for key := range keys {
			for _, word := range []string{"quantiles", "probability", "standard_error"} {
				if strings.Contains(key, word) {
					t.Errorf("%s: has %s", name, key)
				}
			}
		}
		if keys["uncertainty"] != (name == "beyond") || len(keys) < 50 {
			t.Errorf("%s: %d members", name, len(keys))
		}
	}
}

func TestSpreadInText(t *testing.T) {
	a := spread(t)
	for _, width := range []int{80, 96, 160} {
		page := string(AppendText(nil, a, TextOptions{Width: width}))
		for _, part := range []string{"Uncertain inputs\n", "1.40 m/s ± 0.280 m/s, normal", "10.0 °C ± 3 K, normal", "0.002 to 0.02, uniform",
			"256 draws of them", " > Added mass from potential flow", " % ± ", "hold or fall with them\n   no-lock-in ", "(90 % of draws)"} {
			if !strings.Contains(page, part) {
				t.Errorf("at %d: no %q in\n%s", width, part, page)
			}
		}
	}
	page := string(AppendText(nil, beyond(t), TextOptions{}))
	if !strings.Contains(page, "0 draws of them; 256 more lay outside") || strings.Contains(page, "How likely") {
		t.Errorf("%s", page)
	}
	if page := string(AppendText(nil, classify(t, classified["riser"]), TextOptions{})); strings.Contains(page, "Uncertain inputs") {
		t.Error("a certain case has uncertain inputs")
	}
}
