package canon

import (
	"math"
	"sync"
)

// legendreRule holds the nodes in (0, 1) and weights of a Gauss–Legendre rule.
type legendreRule struct {
	x, w []float64
}

// legendreRuleLimit bounds the rules that are kept.
const legendreRuleLimit = 1024

var legendreRules [legendreRuleLimit + 1]struct {
	once sync.Once
	rule legendreRule
}

// legendreRuleFor returns the rule of at least n nodes, rounded up to a multiple
// of 4 so that few different rules are ever made.
func legendreRuleFor(n int) *legendreRule {
	n = min(max((n+3)/4*4, 4), legendreRuleLimit)
	slot := &legendreRules[n]
	slot.once.Do(func() { slot.rule = newLegendreRule(n) })
	return &slot.rule
}

// newLegendreRule finds the zeros of the Legendre polynomial by Newton steps from
// their asymptotic places.
func newLegendreRule(n int) legendreRule {
	r := legendreRule{x: make([]float64, n), w: make([]float64, n)}
	for i := range (n + 1) / 2 {
		z := math.Cos(math.Pi * (float64(i) + 0.75) / (float64(n) + 0.5))
		var slope float64
		for range 20 {
			var value float64
			value, slope = legendreWithSlope(n, z)
			step := value / slope
			z -= step
			if math.Abs(step) < 1e-15 {
				break
			}
		}
		_, slope = legendreWithSlope(n, z)
		w := 1 / ((1 - z*z) * slope * slope)
		r.x[i], r.x[n-1-i] = 0.5*(1-z), 0.5*(1+z)
		r.w[i], r.w[n-1-i] = w, w
	}
	return r
}

func legendreWithSlope(n int, z float64) (value, slope float64) {
	before, p := 1.0, z
	for k := 2; k <= n; k++ {
		x := float64(k)
		before, p = p, ((2*x-1)*z*p-(x-1)*before)/x
	}
	return p, float64(n) * (z*p - before) / (z*z - 1)
}
