package canon

import "math"

// pipeBuckling is the lowest speed at which a pipe on two supports buckles.
func pipeBuckling(gamma float64, support PipeSupport) (float64, error) {
	if gamma == 0 {
		switch support {
		case PipePinnedPinned:
			return math.Pi, nil
		case PipeClampedClamped:
			return 2 * math.Pi, nil
		case PipeClampedPinned:
			return 4.493409457909064, nil // tan u = u
		}
	}
	const step = 0.25
	d0 := pipeStaticDeterminant(0, gamma, support)
	for u := step; u < pipeSpeedEnd; u += step {
		d := pipeStaticDeterminant(u, gamma, support)
		if (d > 0) == (d0 > 0) {
			continue
		}
		lo, hi := u-step, u
		for hi-lo > 1e-14*hi {
			mid := (lo + hi) / 2
			if mid <= lo || mid >= hi {
				break
			}
			if (pipeStaticDeterminant(mid, gamma, support) > 0) == (d0 > 0) {
				lo = mid
			} else {
				hi = mid
			}
		}
		return (lo + hi) / 2, nil
	}
	return 0, &RangeError{Function: "ConveyingPipe", Arg: "gamma", Value: gamma, Reason: "no buckling found"}
}

// pipeStaticDeterminant is that of the static equation, integrated once with
// the slope v = η′ and the constant C: v″ + (u² − γ(1 − ξ))v = C; zero deflection
// at both ends is ∫v dξ = 0.
func pipeStaticDeterminant(u, gamma float64, support PipeSupport) float64 {
	forced := pipeStaticSlope(u, gamma, 0, 0, 1)
	switch support {
	case PipePinnedPinned:
		free := pipeStaticSlope(u, gamma, 1, 0, 0)
		return free.curvature*forced.deflection - forced.curvature*free.deflection
	case PipeClampedClamped:
		free := pipeStaticSlope(u, gamma, 0, 1, 0)
		return free.slope*forced.deflection - forced.slope*free.deflection
	default:
		free := pipeStaticSlope(u, gamma, 0, 1, 0)
		return free.curvature*forced.deflection - forced.curvature*free.deflection
	}
}

// pipeEnd is the state at ξ = 1.
type pipeEnd struct{ deflection, slope, curvature float64 }

// pipeStaticSlope sums the power series of v with v(0), v′(0) and C given.
func pipeStaticSlope(u, gamma, v0, v1, c float64) pipeEnd {
	stiff := u*u - gamma
	b0, b1, b2 := 0.0, v0, v1 // coefficients n − 1, n, n + 1
	end := pipeEnd{v0 + v1/2, v0 + v1, v1}
	small := 0
	for n := 0; n < 300 && small < 4; n++ {
		a := float64(n + 2)
		b3 := (c - stiff*b1 - gamma*b0) / (a * (a - 1))
		c = 0
		end.deflection += b3 / (a + 1)
		end.slope += b3
		end.curvature += a * b3
		if math.Abs(a*b3) < 1e-18*(math.Abs(end.curvature)+math.Abs(end.slope)) {
			small++
		} else {
			small = 0
		}
		b0, b1, b2 = b1, b2, b3
	}
	return end
}
