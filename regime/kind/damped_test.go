package kind_test

import (
	"math"
	"testing"

	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// A light slender wing in cruise: the flow damps its bending by more than half
// of the critical damping, which a fluid at rest would not.
func TestWingDampedByFlow(t *testing.T) {
	a := answerOf(t, `{"structure":{"kind":"wing","chord":"0.8 m","span":"9 m","mass_per_length":"7 kg/m","inertia_per_length":"0.3 kg m","frequency_bending":"2.1 Hz","frequency_torsion":"22 Hz","elastic_axis":0.35,"centre_of_gravity":0.42,"damping_ratio":0.01},
		"fluid":"air","flow":{"speed":"150 km/h"}}`)
	zeta := a.Groups.Get(group.DampingFlow)
	if zeta < 0.5 || zeta > 0.7 {
		t.Fatalf("ζ_flow = %g: the case decides nothing", zeta)
	}
	f := a.Findings[assumption.StillFluid.Index()]
	if f.Verdict != finding.Invalid {
		t.Errorf("still-fluid %s", f.Verdict)
	}
	closeTo(t, "shift of the frequency", f.Main().Estimate, 1-math.Sqrt(1-zeta*zeta), 1e-12)
}
