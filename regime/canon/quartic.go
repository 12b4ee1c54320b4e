package canon

import "math/cmplx"

// quarticRoots finds the roots of z⁴ + c₃z³ + c₂z² + c₁z + c₀ by the
// simultaneous iteration of Durand and Kerner, from starting points spread on a
// circle of the size of the roots.
func quarticRoots(c3, c2, c1, c0 complex128) [4]complex128 {
	// Fujiwara's bound on the roots.
	size := 2 * max(cmplx.Abs(c3), sqrtAbs(c2, 2), sqrtAbs(c1, 3), sqrtAbs(c0, 4))
	if size == 0 {
		return [4]complex128{}
	}
	var z [4]complex128
	start := complex(0.4*size, 0)
	turn := complex(0.28366218546322625, 0.9589242746631385) // e^{5i}, no symmetry of the roots
	for i := range z {
		z[i] = start
		start *= turn
	}
	for range 200 {
		moved := 0.0
		for i := range z {
			p := (((z[i]+c3)*z[i]+c2)*z[i]+c1)*z[i] + c0
			q := complex(1, 0)
			for j := range z {
				if j != i {
					q *= z[i] - z[j]
				}
			}
			if q == 0 {
				q = complex(1e-300, 0)
			}
			d := p / q
			z[i] -= d
			moved = max(moved, cmplx.Abs(d))
		}
		if !(moved > 1e-15*size) {
			break
		}
	}
	return z
}

// sqrtAbs is |z|^{1/n}.
func sqrtAbs(z complex128, n int) float64 {
	return real(cmplx.Pow(complex(cmplx.Abs(z), 0), complex(1/float64(n), 0)))
}
