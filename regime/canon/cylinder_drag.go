package canon

import (
	"math"

	"regimed/regime/cite"
)

// cylinderDragCreeping is the Reynolds number up to which the expansion for
// creeping flow is used.
const cylinderDragCreeping = 0.5

// CylinderDrag is the mean drag coefficient of a long smooth circular cylinder
// across a uniform stream, with the band in which measurements lie.
//
//	Re ≤ 0.5: C_D = (8π/(Re t))(1 − 0.87/t²), t = ln(8/Re) − 0.0772;
//	above: a curve through computed and measured values, linear in log–log
//
// Symbols: re = UD/ν [1]; C_D on ½ρU²D per length.
// Range: 1e-4 ≤ Re ≤ 1e8.
// Accuracy: 5 % below Re 200, 10 % to 2e5 (15 % from 2000 on); in the drag crisis, 2e5 to
// 3.5e6, only the band 0.2 to 1.2 means anything: the fall moves with roughness
// and turbulence; 25 % beyond.
// Check: Re 20: 2.045; Re 1e5: 1.2.
// Source: Kaplun 1957 (creeping flow), Dennis & Chang 1970 (Re 5 to 40),
// Wieselsberger 1921 (to 8e5), Roshko 1961 (beyond), all from memory.
func CylinderDrag(re float64) (cd, lo, hi float64, err error) {
	if err := inRange("CylinderDrag", "reynolds", re, 1e-4, 1e8); err != nil {
		return 0, 0, 0, err
	}
	cd = cylinderDragCurve(re)
	switch {
	case re > DragCrisisEnd:
		return cd, 0.75 * cd, 1.25 * cd, nil
	case re > DragCrisisStart:
		return cd, 0.2, 1.2, nil
	}
	w := interpolateKnots(math.Log(re), cylinderDragScatter)
	return cd, cd * (1 - w), cd * (1 + w), nil
}

var cylinderDragScatter = []knot{
	{math.Log(200), 0.05}, {math.Log(300), 0.10}, {math.Log(1000), 0.10}, {math.Log(2000), 0.15},
}

func cylinderDragCurve(re float64) float64 {
	if re <= cylinderDragCreeping {
		return cylinderDragKaplun(re)
	}
	return math.Exp(interpolateKnots(math.Log(re), cylinderDragKnots))
}

// cylinderDragKaplun is the matched expansion to the third order.
func cylinderDragKaplun(re float64) float64 {
	// ½ − γ, γ = 0.5772… Euler's constant.
	t := math.Log(8/re) + 0.5 - 0.57721566490153286
	return 8 * math.Pi / (re * t) * (1 - 0.87/(t*t))
}

// cylinderDragKnots holds (ln Re, ln C_D). Re 5 to 40: Dennis & Chang 1970; 1 and 2
// between that and the expansion; from 60: the curve of Wieselsberger 1921,
// with the unsteady values of the laminar wake; from 1e6: Roshko 1961. All from
// memory.
var cylinderDragKnots = logKnots([]knot{
	{cylinderDragCreeping, cylinderDragKaplun(cylinderDragCreeping)},
	{1, 10.2}, {2, 6.8}, {5, 4.116}, {7, 3.421}, {10, 2.846}, {20, 2.045}, {40, 1.522},
	{60, 1.40}, {100, 1.34}, {200, 1.30}, {400, 1.15}, {1000, 1.00}, {2000, 0.95}, {5000, 1.03},
	{1e4, 1.15}, {2e4, 1.20}, {2e5, 1.20}, {3e5, 0.80}, {4e5, 0.40}, {5e5, 0.30}, {7e5, 0.30},
	{1e6, 0.37}, {2e6, 0.52}, {3.5e6, 0.65}, {1e7, 0.70}, {1e8, 0.70},
})

func logKnots(table []knot) []knot {
	out := make([]knot, len(table))
	for i, k := range table {
		out[i] = knot{math.Log(k.x), math.Log(k.y)}
	}
	return out
}

var cylinderDragEntry = &Entry{
	Name:     "CylinderDrag",
	Problem:  "mean drag coefficient of a smooth circular cylinder across a uniform stream",
	Equation: "Re ≤ 0.5: (8π/(Re t))(1 − 0.87/t²), t = ln(8/Re) − 0.0772; above: curve through computed and measured values",
	Args:     []Arg{{Name: "reynolds", Symbol: "Re", Doc: "Reynolds number on the diameter", Min: 1e-4, Max: 1e8, From: 0.01, To: 1e8}},
	Outputs: []Output{
		{ID: "drag", Symbol: "C_D", Doc: "mean drag coefficient on the diameter"},
		{ID: "low", Symbol: "C_D,min", Doc: "lower end of its band"},
		{ID: "high", Symbol: "C_D,max", Doc: "upper end of its band"},
	},
	Accuracy: 0.15,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Kaplun1957, cite.DennisChang1970, cite.Wieselsberger1921, cite.Roshko1961},
	Note:     "smooth, fixed, long, smooth stream; roughness and turbulence bring the drag crisis forward; a vibrating cylinder drags more",
	Limits: []Limit{
		{"creeping flow, Lamb: 8π/(Re(ln(8/Re) − 0.0772))", "drag", Low, 0.01, func(a []float64) float64 {
			return 8 * math.Pi / (a[0] * (math.Log(8/a[0]) + 0.5 - eulerGamma))
		}},
	},
	Eval: func(a []float64) ([]float64, error) {
		cd, lo, hi, err := CylinderDrag(a[0])
		return []float64{cd, lo, hi}, err
	},
}
