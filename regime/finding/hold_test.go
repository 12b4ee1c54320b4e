package finding

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// A power of the group is solved to rounding.
func TestHoldOfPower(t *testing.T) {
	rows := []struct {
		name     string
		estimate func(float64) float64
		limit    float64
		want     float64
		least    bool
	}{
		{"the group itself", func(v float64) float64 { return v }, 0.1, 0.1, false},
		{"half of it", func(v float64) float64 { return v / 2 }, 0.05, 0.1, false},
		{"its square", func(v float64) float64 { return v * v / 2 }, 0.02, 0.2, false},
		{"its root", math.Sqrt, 0.5, 0.25, false},
		{"its inverse", func(v float64) float64 { return 1 / v }, 0.1, 10, true},
		{"inverse square", func(v float64) float64 { return 300 / (v * v) }, 3, 10, true},
		{"very small", func(v float64) float64 { return 1e30 * v }, 1e-5, 1e-35, false},
	}
	for _, r := range rows {
		v, least := hold(r.estimate, r.limit)
		if math.Abs(v/r.want-1) > 1e-12 || least != r.least {
			t.Errorf("%s: holds to %g (least %v), want %g (%v)", r.name, v, least, r.want, r.least)
		}
	}
	if len(rows) != 7 {
		t.Errorf("%d rows", len(rows))
	}
}

// What is no power is bisected: increasing, decreasing, never reached.
func TestHoldByBisection(t *testing.T) {
	rows := []struct {
		name     string
		estimate func(float64) float64
		limit    float64
		want     float64 // NaN: none
		least    bool
	}{
		{"√(1 + v) − 1", func(v float64) float64 { return math.Sqrt(1+v) - 1 }, 0.05, 1.05*1.05 - 1, false},
		{"Prandtl and Glauert", func(m float64) float64 {
			if m >= 1 {
				return 10
			}
			return 1/math.Sqrt(1-m*m) - 1
		}, 0.1, math.Sqrt(1 - 1/1.21), false},
		{"a share of damping, 0.02/(v + 0.02)", func(v float64) float64 { return 0.02 / (v + 0.02) }, 0.2, 0.08, true},
		{"never that large", func(v float64) float64 { return v / (1 + v) }, 2, math.NaN(), false},
		{"always larger", func(v float64) float64 { return 3 + v }, 2, math.NaN(), false},
		{"constant", func(float64) float64 { return 1 }, 2, math.NaN(), false},
		{"no estimate", nil, 1, math.NaN(), false},
	}
	for _, r := range rows {
		v, least := hold(r.estimate, r.limit)
		if math.IsNaN(r.want) != math.IsNaN(v) || !math.IsNaN(v) && (math.Abs(v/r.want-1) > 1e-9 || least != r.least) {
			t.Errorf("%s: holds to %g (least %v), want %g (%v)", r.name, v, least, r.want, r.least)
		}
	}
	if len(rows) != 7 {
		t.Errorf("%d rows", len(rows))
	}
}

// On its side of the value the estimate is within the limit, on the other beyond.
func TestHoldSeparates(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		power := rapid.SampledFrom([]float64{-3, -1, -0.5, 0.5, 1, 2}).Draw(t, "power")
		scale := math.Pow(10, rapid.Float64Range(-4, 4).Draw(t, "scale"))
		offset := rapid.SampledFrom([]float64{0, 0, 0.3, 1}).Draw(t, "offset")
		limit := math.Pow(10, rapid.Float64Range(-2, 1).Draw(t, "limit"))
		estimate := func(v float64) float64 { return math.Pow(v*scale+offset, power) }
		v, least := hold(estimate, limit)
		if math.IsNaN(v) {
			return
		}
		inside, outside := v*(1-1e-6), v*(1+1e-6)
		if least {
			inside, outside = outside, inside
		}
		if least != (power < 0) || estimate(inside) > limit || estimate(outside) < limit {
			t.Fatalf("(%g v + %g)^%g against %g: %g, least %v", scale, offset, power, limit, v, least)
		}
	})
}
