package kind

import (
	"math"
	"testing"
)

// Taylor's plate by stepping its equation of motion, m v̇ = 2P e^(−t/θ) − ρc v: the
// impulse until the pressure at the face is nil, and the deepest pressure after.
func TestTaylorPlate(t *testing.T) {
	ran := 0
	for _, psi := range []float64{0.2, 0.7, 1, 3, 5.3428, 20} {
		const dt = 1e-5 // of θ
		v, impulse, deepest := 0.0, math.NaN(), 0.0
		for i := range 2_000_000 {
			at := float64(i) * dt
			pressure := 2*math.Exp(-at) - psi*v // over P; v over Pθ/m
			if pressure < 0 && math.IsNaN(impulse) {
				impulse = v / 2
			}
			deepest = math.Min(deepest, pressure)
			middle := v + pressure*dt/2
			v += dt * (2*math.Exp(-at-dt/2) - psi*middle)
		}
		share, tension := shockImpulse(psi)
		about(t, "impulse", share, impulse, 1e-4)
		about(t, "tension", tension, -deepest, 1e-4)
		ran++
	}
	if ran != 6 {
		t.Errorf("ran %d", ran)
	}
	share, _ := shockImpulse(5.3428)
	about(t, "speed of the plate under 100 kg of TNT at 20 m", 2*10.058e6*0.54557e-3/157*share, 8.8948, 1e-3)
}
