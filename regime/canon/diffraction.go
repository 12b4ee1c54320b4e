package canon

import (
	"math"

	"regimed/regime/cite"
)

const diffractionMax = 1e4

// CylinderDiffraction is the inertia coefficient of a vertical surface-piercing
// circular cylinder in regular waves, and the lag of its force.
//
//	C_M = 4/(π(ka)²|H₁′(ka)|), lag = arctan(J₁′/Y₁′)
//
// Symbols: ka [1], wave number times radius; C_M [1], on ρπa² and the undisturbed
// acceleration at the axis; lag [rad], of the force behind that acceleration, a
// continuous function of ka: it rises a little, then falls to −∞.
// Range: 0 ≤ ka ≤ 1e4. ka→0: 2 and 0; ka→∞: C_M → 4/√(2π)·(ka)^−3/2.
// Accuracy: 1e-12.
// Check: ka 1: 1.3716158315.
// Source: MacCamy & Fuchs 1954 (from memory).
func CylinderDiffraction(ka float64) (inertia, lag float64, err error) {
	if err := inRange("CylinderDiffraction", "ka", ka, 0, diffractionMax); err != nil {
		return 0, 0, err
	}
	if ka < 1e-100 { // Y₁′ would overflow
		return 2, 0, nil
	}
	j := math.J0(ka) - math.J1(ka)/ka
	y := math.Y0(ka) - math.Y1(ka)/ka
	lag = math.Atan2(j, y)
	// The lag goes to 3π/4 − ka − 7/(8ka): the turns are taken from there.
	if ka > 1 {
		far := 0.75*math.Pi - ka - 7/(8*ka)
		lag += 2 * math.Pi * math.Round((far-lag)/(2*math.Pi))
	}
	return 4 / (math.Pi * ka * ka * math.Hypot(j, y)), lag, nil
}

var cylinderDiffractionEntry = &Entry{
	Name:     "CylinderDiffraction",
	Problem:  "wave force on a vertical circular cylinder that diffracts the wave",
	Equation: "C_M = 4/(π(ka)²|H₁′(ka)|), lag = arctan(J₁′/Y₁′)",
	Args:     []Arg{{Name: "ka", Symbol: "ka", Doc: "wave number times radius", Min: 0, Max: diffractionMax, From: 0.01, To: 5}},
	Outputs: []Output{
		{ID: "inertia", Symbol: "C_M", Doc: "inertia coefficient"},
		{ID: "lag", Symbol: "α", Doc: "lag of the force behind the undisturbed acceleration, rad"},
	},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.MacCamyFuchs1954},
	Note:     "linear waves, no drag",
	Limits: []Limit{
		{"long waves: 2", "inertia", Low, 1e-12, constant(2)},
		{"short waves: 4/√(2π) (ka)^−3/2", "inertia", High, 1e-4, func(a []float64) float64 { return 4 / math.Sqrt(2*math.Pi) * math.Pow(a[0], -1.5) }},
		{"short waves: 3π/4 − ka", "lag", High, 1e-6, func(a []float64) float64 { return 0.75*math.Pi - a[0] }},
	},
	Eval: func(a []float64) ([]float64, error) {
		inertia, lag, err := CylinderDiffraction(a[0])
		return []float64{inertia, lag}, err
	},
}
