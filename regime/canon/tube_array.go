package canon

import (
	"math"

	"regimed/regime/cite"
)

// TubeArrayCritical is the pitch velocity at which a tube array becomes
// fluidelastically unstable.
//
//	V_p/(fD) = K √(2πζm/(ρD²))
//
// Symbols: massDamping = 2πζm/(ρD²) [1], f [Hz], ζ [1] and m [kg/m] (structure,
// contents and added mass) all in the fluid; k = K [1], constant of the criterion (TubeArrayCriteria).
// Range: 1e-6 ≤ 2πζm/(ρD²) ≤ 1e6; 0.1 ≤ K ≤ 20.
// Accuracy: exact as a formula; measurements scatter by a factor of two.
// Check: 1, K 3: 3.
// Source: Connors 1970 (from memory).
func TubeArrayCritical(massDamping, k float64) (float64, error) {
	if err := inRange("TubeArrayCritical", "mass_damping", massDamping, 1e-6, 1e6); err != nil {
		return 0, err
	}
	if err := inRange("TubeArrayCritical", "k", k, 0.1, 20); err != nil {
		return 0, err
	}
	return k * math.Sqrt(massDamping), nil
}

// Constants K of the criteria (from memory of the sources), and the mass-damping
// from which those of ASME hold.
const (
	TubeArrayDesignK     = 3.0 // design value, all layouts: Pettigrew & Taylor 1991
	TubeArrayASMELowerK  = 2.4 // lower bound of all layouts: ASME N-1331
	TubeArrayASMEMeanK   = 4.0 // mean of all layouts: ASME N-1331
	TubeArraySingleRowK  = 9.9 // one row, pitch ratio 1.41, in air: Connors 1970
	TubeArrayASMEMinimum = 0.7
)

var tubeArrayCriticalEntry = &Entry{
	Name:     "TubeArrayCritical",
	Problem:  "fluidelastic instability of a tube array in cross flow",
	Equation: "V_p/(fD) = K √(2πζm/(ρD²))",
	Args: []Arg{
		{Name: "mass_damping", Symbol: "2πζm/(ρD²)", Doc: "mass-damping, all in the fluid", Min: 1e-6, Max: 1e6, From: 0.01, To: 1000},
		{Name: "k", Symbol: "K", Doc: "constant of the criterion", Min: 0.1, Max: 20, Optional: true, Default: TubeArrayDesignK},
	},
	Outputs:  []Output{{ID: "speed", Symbol: "V_p/(fD)", Doc: "critical reduced pitch velocity"}},
	Accuracy: 1e-12,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.Connors1970, cite.PettigrewTaylor1991, cite.ASMEN1331},
	Note:     "K 3.0 for design; 2.4 lower bound and 4.0 mean for mass-damping above 0.7; 9.9 for one row only",
	Eval: func(a []float64) ([]float64, error) {
		v, err := TubeArrayCritical(a[0], a[1])
		return []float64{v}, err
	},
}
