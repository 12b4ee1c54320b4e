package whatif

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

// close closes a bracket on a change at a place, and returns the number of looks.
func (b *bracket) close(change float64, f func(x float64) float64) int {
	looks := 0
	for b.high-b.low > rootTolerance && looks < 400 {
		looks++
		if x := b.next(); x <= change {
			b.lower(x, f(x))
		} else {
			b.upper(x, f(x))
		}
	}
	return looks
}

// A power law, a line in logarithms, takes two looks; smooth functions a handful;
// a jump no more than three halvings a bit.
func TestBracketCloses(t *testing.T) {
	nan := func(float64) float64 { return math.NaN() }
	rows := 0
	for _, r := range []struct {
		name         string
		change, most float64
		f            func(x float64) float64
	}{
		{"line", 0.1234567, 2, func(x float64) float64 { return 3 * (x - 0.1234567) }},
		{"falling line", 0.2, 2, func(x float64) float64 { return -2 * (x - 0.2) }},
		{"curve", 0.05, 12, func(x float64) float64 { return math.Expm1(4 * (x - 0.05)) }},
		{"steep curve", 0.21, 40, func(x float64) float64 { return math.Pow(x/0.21, 40) - 1 }},
		{"nothing known", 0.17, 100, nan},
		{"jump", 0.17, 100, func(x float64) float64 { return math.Copysign(1, x-0.17) }},
		{"of one sign", 0.17, 100, func(x float64) float64 { return 1 + x }},
		{"infinite", 0.17, 100, func(x float64) float64 { return math.Inf(int(math.Copysign(1, x-0.17))) }},
	} {
		b := newBracket(0, 0.288, r.f(0), r.f(0.288))
		looks := b.close(r.change, r.f)
		if b.high-b.low > rootTolerance || b.low > r.change || b.high < r.change || float64(looks) > r.most {
			t.Errorf("%s: %d looks to %v … %v", r.name, looks, b.low, b.high)
		}
		rows++
	}
	if rows != 8 {
		t.Errorf("%d rows", rows)
	}
}

// Whatever values stand at its ends, a bracket closes, and on the change.
func TestBracketClosesOnAnything(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		change := rapid.Float64Range(0, 0.3).Draw(t, "change")
		values := rapid.SliceOfN(rapid.Float64(), 8, 8).Draw(t, "values")
		i := 0
		f := func(float64) float64 { i++; return values[i%8] }
		b := newBracket(0, 0.3, f(0), f(0.3))
		if looks := b.close(change, f); looks >= 400 || b.low > change || b.high < change-rootTolerance {
			t.Fatalf("%d looks to %v … %v, change at %v", looks, b.low, b.high, change)
		}
	})
}
