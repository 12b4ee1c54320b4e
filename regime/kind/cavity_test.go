package kind_test

import (
	"fmt"
	"math"
	"testing"

	"regimed/regime/group"
)

// A shallow sealed cavity of air is a spring ρc²/d, of which the first mode
// of a simply supported plate takes (8/π²)², its mean squared over the mean of
// its square; the wet frequency and the structural damping carry it.
func TestPlateOverCavity(t *testing.T) {
	const rows = 3
	ran := 0
	for _, depth := range []float64{0.02, 0.05, 0.2} {
		a := answerOf(t, fmt.Sprintf(`{"structure":{"kind":"plate","length":"0.4 m","width":"0.3 m","mass_per_area":"3 kg/m2","edges":"SSSS","frequency_dry":"50 Hz","damping_ratio":0.01},
			"fluid":{"density":"1.2 kg/m3","kinematic_viscosity":"1.5e-5 m2/s","sound_speed":"340 m/s","phase":"gas","heat_capacity_ratio":1.4},"surroundings":{"backing_depth":"%g m"}}`, depth))
		const density, sound, mass, dry = 1.2, 340.0, 3.0, 50.0
		omega := 2 * math.Pi * dry
		share := math.Pow(8/(math.Pi*math.Pi), 2)
		kappa := density * sound * sound / depth * share / (mass * omega * omega)
		closeTo(t, "stiffness ratio", a.Groups.Get(group.FluidStiffness), kappa, 1e-6)
		inertia := 1 + a.Groups.Get(group.AddedMassRatio)*a.Groups.Get(group.ViscousInertia)
		ratio := math.Sqrt((1 + kappa) / inertia)
		closeTo(t, "wet over dry frequency", a.Groups.Get(group.FrequencyRatio), ratio, 1e-6)
		closeTo(t, "structural damping", a.Groups.Get(group.DampingRatio), 0.01/(ratio*inertia), 1e-6)
		ran++
	}
	if ran != rows {
		t.Errorf("ran %d rows, want %d", ran, rows)
	}
}
