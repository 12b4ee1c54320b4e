package whatif

import (
	"math"
	"testing"
)

// What may hide between two views, and where.
func TestFold(t *testing.T) {
	const span = 0.288
	// of a function, as it is seen from 0 and span and a step outside of them
	of := func(f func(x float64) float64) fold {
		return fold{span: span, f: f(0), g: f(span), left: (f(0) - f(-span)) / span, right: (f(2*span) - f(span)) / span, before: span, after: span}
	}
	tent := func(top, x0, slope float64) func(float64) float64 {
		return func(x float64) float64 { return top - slope*math.Abs(x-x0) }
	}
	never, middle := math.NaN(), span/2
	rows := 0
	for _, r := range []struct {
		name string
		fold fold
		want float64 // NaN: nothing hides
	}{
		{"a power law", of(func(x float64) float64 { return 2*x - 1 }), never},
		{"a power law near its limit", of(func(x float64) float64 { return 0.1*x - 0.05 }), never},
		{"a slow curve", of(func(x float64) float64 { return -1 + 0.1*x*x }), never},
		{"a peak above the limit", of(tent(0.02, 0.1, 2)), 0.1},
		{"a peak far below", of(tent(-1, 0.1, 2)), never},
		{"a dip below the limit", of(func(x float64) float64 { return -tent(0.05, 0.2, 3)(x) }), 0.2},
		{"a dip far above", of(func(x float64) float64 { return -tent(-1, 0.2, 2)(x) }), never},
		{"a resonance", of(func(x float64) float64 { return -5 - math.Log(math.Abs(x-0.25)) }), 0.25},
		{"an error through zero", of(func(x float64) float64 { return 4 + math.Log(math.Abs(x-0.05)) }), 0.05},
		{"a part of one side", fold{span: span, f: -0.1, g: math.NaN()}, middle},
		{"no slope is known", fold{span: span, f: -0.2, g: -0.9, left: never, right: never}, never},
		{"a jump off a flat", fold{span: span, f: -0.2, g: -0.9, left: 0.001, right: 0}, middle},
		{"a change of sign", fold{span: span, f: -0.2, g: 0.3, left: 1, right: 9}, never}, // shows by itself
	} {
		got := r.fold.place()
		if math.IsNaN(got) != math.IsNaN(r.want) || math.Abs(got-r.want) > 0.06 {
			t.Errorf("%s: %v, not %v", r.name, got, r.want)
		}
		if got < 0 || got > span {
			t.Errorf("%s: %v lies outside", r.name, got)
		}
		rows++
	}
	if rows != 13 {
		t.Errorf("%d rows", rows)
	}
}
