package canon

import (
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestStringMode(t *testing.T) {
	must := structureMust(t)
	structureClose(t, "no sag", must(StringMode(3, 0)), 3*math.Pi, 1e-14)
	structureClose(t, "crossover", must(StringMode(1, 4*math.Pi*math.Pi)), 2*math.Pi, 1e-12)
	structureClose(t, "stiff cable", must(StringMode(1, 1e6))/math.Pi, 2.8606, 2e-5) // tan x = x at 2.8606π/2
	rapid.Check(t, func(t *rapid.T) {
		n := 2*rapid.IntRange(0, 20).Draw(t, "half") + 1
		sag := math.Pow(10, rapid.Float64Range(-6, 5.9).Draw(t, "log sag"))
		ω := structureMust(t)(StringMode(n, sag))
		x := ω / 2
		sin, cos := math.Sincos(x)
		scale := 1 + x + 4*x*x*x/sag
		if r := sin - (x-4*x*x*x/sag)*cos; math.Abs(r) > 1e-12*scale {
			t.Fatalf("residual %g", r)
		}
		if up := structureMust(t)(StringMode(n, 1.1*sag)); up < ω*(1-1e-13) {
			t.Fatalf("more sag lowers the frequency: %g to %g", ω, up)
		}
		if ω < float64(n)*math.Pi*(1-1e-13) || ω > float64(n+2)*math.Pi {
			t.Fatalf("mode %d at %g π", n, ω/math.Pi)
		}
	})
	tally(t, "StringMode", "published crossover 2π and 2.861π", 2)
	tally(t, "StringMode", "residual of the frequency equation", 1)
}

func TestRingAndTube(t *testing.T) {
	must := structureMust(t)
	structureClose(t, "n = 2", must(RingMode(2)), 6/math.Sqrt(5), 1e-14)
	structureClose(t, "n = 3", must(RingMode(3)), 24/math.Sqrt(10), 1e-14)
	// Many waves: each is a straight beam of half wave length πR/n, ω = n².
	structureClose(t, "short waves", must(RingMode(1000))/1e6, 1, 1e-5)
	if _, err := RingMode(1); err == nil {
		t.Error("a rigid motion of the ring has a frequency")
	}
	structureClose(t, "free", must(BreathingTube(AxiallyFree, 0.3)), 1, 0)
	structureClose(t, "held", must(BreathingTube(AxiallyHeld, 0.3)), 1/math.Sqrt(0.91), 1e-15)
	structureClose(t, "no Poisson effect", must(BreathingTube(AxiallyHeld, 0)), 1, 0)
	tally(t, "RingMode", "published 2.683 and 7.589", 2)
	tally(t, "BreathingTube", "ν = 0.3 by hand", 1)
}
