package canon

import (
	"math"

	"regimed/regime/cite"
)

// flagWaveNumber is kL of the second mode of a cantilever, the shape in which
// flags flutter first.
const flagWaveNumber = 4.694091132974175

// FlagCritical is the speed at which a plate clamped at its leading edge flutters
// in axial flow.
//
//	U² = Bk²(1/m + 1/m_a), m_a = (2ρ/k)/(1 + 8/(πkH)), kL = 4.694:
//	u² = (kL)²(1 + (kL/2)(m/(ρL))(1 + 8L/(πkL·H)))
//
// Symbols: u = UL√(m/B) [1], B bending stiffness per width [N·m], m mass per
// area [kg/m²]; massRatio = ρL/m [1]; aspect = H/L [1], width over length.
// Range: 1e-6 ≤ ρL/m ≤ 1e6; 1e-3 ≤ H/L ≤ 1e9. Wide: m_a = 2ρ/k; slender: πρH/4
// (below H/L 0.3 ConveyingPipe with the virtual mass πρH²/4 is sharper).
// Accuracy: a local wave criterion: measured thresholds lie up to a factor of
// two above two-dimensional theory, and have hysteresis.
// Check: ρL/m 1, H/L 1e9: 8.5878; ρL/m 1, H/L 1: 10.0899.
// Source: dispersion relation of a plate between two streams; Eloy et al. 2007,
// 2008 for comparison (from memory).
func FlagCritical(massRatio, aspect float64) (float64, error) {
	if err := inRange("FlagCritical", "mass_ratio", massRatio, 1e-6, 1e6); err != nil {
		return 0, err
	}
	if err := inRange("FlagCritical", "aspect", aspect, 1e-3, 1e9); err != nil {
		return 0, err
	}
	const k = flagWaveNumber
	perAddedMass := k / (2 * massRatio) * (1 + 8/(math.Pi*k*aspect))
	return k * math.Sqrt(1+perAddedMass), nil
}

var flagCriticalEntry = &Entry{
	Name:     "FlagCritical",
	Problem:  "flutter of a plate clamped at its leading edge in axial flow",
	Equation: "U² = Bk²(1/m + 1/m_a), m_a = (2ρ/k)/(1 + 8/(πkH)), kL = 4.694; u = UL√(m/B)",
	Args: []Arg{
		{Name: "mass_ratio", Symbol: "ρL/m", Doc: "fluid density times length over mass per area", Min: 1e-6, Max: 1e6, From: 0.01, To: 100},
		{Name: "aspect", Symbol: "H/L", Doc: "width over length", Min: 1e-3, Max: 1e9, Optional: true, Default: 1e9},
	},
	Outputs:  []Output{{ID: "u", Symbol: "u_c", Doc: "critical UL√(m/B)"}},
	Accuracy: 0.5,
	Factor:   2,
	Sources:  []*cite.Source{cite.Eloy2007, cite.Eloy2008},
	Note:     "measured thresholds lie up to twice above two-dimensional theory, with hysteresis; below H/L 0.3 the slender ConveyingPipe is sharper",
	Limits: []Limit{
		{"light fluid: kL √(m/m_a)", "u", Low, 1e-5, func(a []float64) float64 {
			const k = flagWaveNumber
			return k * math.Sqrt(k/(2*a[0])*(1+8/(math.Pi*k*a[1])))
		}},
		{"heavy fluid: kL = 4.694", "u", High, 1e-5, constant(flagWaveNumber)},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := FlagCritical(a[0], a[1])
		return []float64{v}, err
	},
}
