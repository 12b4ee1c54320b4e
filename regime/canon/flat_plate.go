package canon

import (
	"math"

	"regimed/regime/cite"
)

// FlatPlateLayer is the boundary layer of a smooth flat plate along the stream,
// at the distance x from its leading edge.
type FlatPlateLayer struct {
	LocalFriction         float64 // c_f = τ_w/(½ρU²) at x
	MeanFriction          float64 // C_F, mean of c_f from the edge to x
	Thickness             float64 // δ/x, 99 % of the stream
	DisplacementThickness float64 // δ*/x
}

// FlatPlate is the boundary layer of a smooth flat plate without pressure
// gradient.
//
//	laminar: c_f = 0.6641/√Re, C_F = 1.3282/√Re, δ/x = 4.91/√Re, δ*/x = 1.7208/√Re
//	turbulent from the edge: c_f = (2 log₁₀Re − 0.65)^−2.3, C_F = 0.455/(log₁₀Re)^2.58,
//	δ/x = 0.37/Re^0.2, δ*/x = 0.046/Re^0.2
//
// Symbols: re = Ux/ν [1]; turbulent: which of the two.
// Range: laminar 1e2 ≤ Re ≤ 3e6; turbulent 1e4 ≤ Re ≤ 1e9. Transition lies
// between 3e5 and 3e6.
// Accuracy: laminar 1e-4 of the boundary-layer equations, which at low Re miss
// about 2.3/Re of mean friction; turbulent 5 % of the friction, 10 % of the thickness.
// Check: laminar Re 1e4: C_F 0.013282, δ*/x 0.017208; turbulent Re 1e6: c_f 0.0037455,
// C_F 0.0044709.
// Source: Blasius 1908; Schlichting 1979, chapter 21 (from memory).
func FlatPlate(re float64, turbulent bool) (FlatPlateLayer, error) {
	if !turbulent {
		if err := inRange("FlatPlate", "reynolds", re, 1e2, 3e6); err != nil {
			return FlatPlateLayer{}, err
		}
		r := math.Sqrt(re)
		return FlatPlateLayer{0.66411 / r, 1.32823 / r, 4.91 / r, 1.72079 / r}, nil
	}
	if err := inRange("FlatPlate", "reynolds", re, 1e4, 1e9); err != nil {
		return FlatPlateLayer{}, err
	}
	l := math.Log10(re)
	r := math.Pow(re, 0.2)
	return FlatPlateLayer{math.Pow(2*l-0.65, -2.3), 0.455 / math.Pow(l, 2.58), 0.37 / r, 0.046 / r}, nil
}

var flatPlateEntry = &Entry{
	Name:     "FlatPlate",
	Problem:  "friction and thickness of the boundary layer of a smooth flat plate",
	Equation: "laminar: c_f = 0.664/√Re, δ*/x = 1.72/√Re; turbulent: c_f = (2 log₁₀Re − 0.65)^−2.3, δ*/x = 0.046/Re^0.2",
	Args: []Arg{
		{Name: "reynolds", Symbol: "Re_x", Doc: "Reynolds number on the distance from the leading edge", Min: 1e2, Max: 1e9},
		{Name: "layer", Symbol: "layer", Doc: "laminar, or turbulent from the edge", Choices: []string{"laminar", "turbulent"}},
	},
	Outputs: []Output{
		{ID: "local_friction", Symbol: "c_f", Doc: "τ_w/(½ρU²) at x"},
		{ID: "mean_friction", Symbol: "C_F", Doc: "mean of c_f up to x"},
		{ID: "thickness", Symbol: "δ/x", Doc: "99 % thickness"},
		{ID: "displacement_thickness", Symbol: "δ*/x", Doc: "displacement thickness"},
	},
	Accuracy: 0.1,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Blasius1908, cite.Schlichting1979},
	Note:     "laminar to 3e6, turbulent from 1e4; transition between 3e5 and 3e6",
	Eval: func(a []float64) ([]float64, error) {
		l, err := FlatPlate(a[0], a[1] == 1)
		return []float64{l.LocalFriction, l.MeanFriction, l.Thickness, l.DisplacementThickness}, err
	},
}
