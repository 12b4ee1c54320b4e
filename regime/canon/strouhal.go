package canon

import (
	"math"

	"regimed/regime/cite"
)

// Limits of the regimes of the wake of a circular cylinder.
const (
	// SheddingOnset is the Reynolds number below which a cylinder wake is
	// steady (46 to 49: Williamson 1996, from memory).
	SheddingOnset = 47.0
	// DragCrisisStart and DragCrisisEnd bound the range in which separation
	// moves with surface, turbulence and Reynolds number.
	DragCrisisStart = 2e5
	DragCrisisEnd   = 3.5e6

	strouhalSubcritical    = 0.20
	strouhalCrisisLow      = 0.18
	strouhalCrisisHigh     = 0.48
	strouhalBeyond         = 0.25
	strouhalBeyondLow      = 0.22
	strouhalBeyondHigh     = 0.28
	strouhalMaxReynolds    = 1e10
	strouhalLaminarEnd     = 150.0
	strouhalTurbulentStart = 300.0
	strouhalTurbulentEnd   = 2000.0
	strouhalPlateauStart   = 1e4
)

// Strouhal is the Strouhal number of the vortex shedding of a section in cross
// flow, with the band in which it lies.
//
//	circle: 0.212(1 − 21.2/Re) for 47 ≤ Re ≤ 150, 0.212(1 − 12.7/Re) for 300 ≤ Re ≤ 2000,
//	0.20 for 1e4 ≤ Re ≤ 2e5, linear in log Re between; 0.18 to 0.48 through the drag
//	crisis, 0.22 to 0.28 beyond 3.5e6; other sections by table of d/b
//
// Symbols: St = f b/U [1] with b the width across the flow; re = U b/ν [1];
// depthRatio = d/b [1], d along the flow, not used for a circle, a square,
// an iced cable (taken as a circle) or the generic bluff section. st = lo =
// hi = 0 below Re 47: no shedding.
// Range: 0 ≤ Re ≤ 1e10; d/b 0.5 to 10 for the rectangle, 1 to 2 for I, H and
// channel, 1.3 to 2 for the tee.
// Accuracy: the band. Within the drag crisis only the band means anything; st
// is a smooth path through it. The band jumps at both of its ends. Open
// sections carry the envelope of all open sections as their band, since their
// pictures were assigned from memory.
// Check: Re 100: 0.167056; Re 1000: 0.2093076; Re 5e4: 0.20.
// Source: Roshko 1954; Bearman 1969; EN 1991-1-4 Table E.1 and Figure E.1;
// Okajima 1982 for the upper band of rectangles (all from memory).
func Strouhal(re float64, shape SectionShape, depthRatio float64) (st, lo, hi float64, err error) {
	if err := inRange("Strouhal", "reynolds", re, 0, strouhalMaxReynolds); err != nil {
		return 0, 0, 0, err
	}
	st, lo, hi, err = strouhalOfShape(re, shape, depthRatio)
	if err != nil || re < SheddingOnset {
		return 0, 0, 0, err
	}
	return st, lo, hi, nil
}

func strouhalOfShape(re float64, shape SectionShape, depthRatio float64) (st, lo, hi float64, err error) {
	switch shape {
	case SectionCircle, SectionIcedCable:
		st, lo, hi = strouhalCircle(max(re, SheddingOnset))
		return st, lo, hi, nil
	case SectionSquare:
		depthRatio = 1
		fallthrough
	case SectionRectangle:
		if err := inRange("Strouhal", "depth_ratio", depthRatio, 0.5, 10); err != nil {
			return 0, 0, 0, err
		}
		return interpolateKnots(depthRatio, strouhalRectangle),
			interpolateKnots(depthRatio, strouhalRectangleLow),
			interpolateKnots(depthRatio, strouhalRectangleHigh), nil
	case SectionBluff:
		return strouhalBluff, strouhalBluffLow, strouhalBluffHigh, nil
	}
	table, known := strouhalOpen[shape]
	if !known {
		return 0, 0, 0, &RangeError{Function: "Strouhal", Arg: "shape", Value: math.NaN(), Reason: "unknown section " + string(shape)}
	}
	if err := inRange("Strouhal", "depth_ratio", depthRatio, table[0].x, table[len(table)-1].x); err != nil {
		return 0, 0, 0, err
	}
	return interpolateKnots(depthRatio, table), strouhalOpenLow, strouhalOpenHigh, nil
}

// Generic bluff section: sharp-edged bodies lie between the long rectangle and
// the circle. Blevins 1990, chapter 3 (from memory).
const (
	strouhalBluff     = 0.15
	strouhalBluffLow  = 0.10
	strouhalBluffHigh = 0.22
	// Envelope of the open sections of EN 1991-1-4 Table E.1.
	strouhalOpenLow  = 0.07
	strouhalOpenHigh = 0.16
)

// EN 1991-1-4 Figure E.1, sharp-cornered rectangle (from memory). The band is
// 15 %, widened between d/b 2 and 5, where two frequencies compete (Okajima
// 1982, from memory: near 0.16 with reattachment, near 0.06 without).
var (
	strouhalRectangle     = []knot{{1, 0.12}, {2, 0.06}, {3, 0.06}, {3.5, 0.15}, {5, 0.11}, {10, 0.09}}
	strouhalRectangleLow  = []knot{{1, 0.10}, {2, 0.05}, {3, 0.05}, {3.5, 0.06}, {5, 0.09}, {10, 0.075}}
	strouhalRectangleHigh = []knot{{1, 0.14}, {2, 0.10}, {3, 0.17}, {3.5, 0.17}, {5, 0.13}, {10, 0.105}}
)

// EN 1991-1-4 Table E.1, open sections (from memory, the pictures too).
var strouhalOpen = map[SectionShape][]knot{
	SectionI:       {{1, 0.11}, {1.5, 0.10}, {2, 0.14}},
	SectionH:       {{1, 0.13}, {2, 0.08}},
	SectionChannel: {{1, 0.16}, {2, 0.12}},
	SectionTee:     {{1.3, 0.11}, {2, 0.07}},
}

// strouhalCircle evaluates the circular cylinder at Re ≥ 47.
func strouhalCircle(re float64) (st, lo, hi float64) {
	if re > DragCrisisEnd {
		return strouhalBeyond, strouhalBeyondLow, strouhalBeyondHigh
	}
	if re > DragCrisisStart {
		return strouhalCrisis(re), strouhalCrisisLow, strouhalCrisisHigh
	}
	st = strouhalBelowCrisis(re)
	// Half the scatter of measurements: 2 % in laminar shedding, 5 % in the
	// irregular range, 10 % on the subcritical plateau.
	w := math.Exp(interpolateKnots(math.Log(re), strouhalScatter))
	return st, st * (1 - w), st * (1 + w)
}

var strouhalScatter = []knot{
	{math.Log(strouhalLaminarEnd), math.Log(0.02)},
	{math.Log(strouhalTurbulentStart), math.Log(0.05)},
	{math.Log(strouhalTurbulentEnd), math.Log(0.05)},
	{math.Log(strouhalPlateauStart), math.Log(0.10)},
}

func strouhalBelowCrisis(re float64) float64 {
	laminar := func(re float64) float64 { return 0.212 * (1 - 21.2/re) }
	irregular := func(re float64) float64 { return 0.212 * (1 - 12.7/re) }
	switch {
	case re <= strouhalLaminarEnd:
		return laminar(re)
	case re < strouhalTurbulentStart:
		return linearInLog(re, strouhalLaminarEnd, laminar(strouhalLaminarEnd), strouhalTurbulentStart, irregular(strouhalTurbulentStart))
	case re <= strouhalTurbulentEnd:
		return irregular(re)
	case re < strouhalPlateauStart:
		return linearInLog(re, strouhalTurbulentEnd, irregular(strouhalTurbulentEnd), strouhalPlateauStart, strouhalSubcritical)
	}
	return strouhalSubcritical
}

// strouhalCrisis leads from 0.20 over the middle of the band (geometric, at the
// geometric middle of the range) to 0.25.
func strouhalCrisis(re float64) float64 {
	middleRe := math.Sqrt(DragCrisisStart * DragCrisisEnd)
	middle := math.Sqrt(strouhalCrisisLow * strouhalCrisisHigh)
	if re < middleRe {
		return linearInLog(re, DragCrisisStart, strouhalSubcritical, middleRe, middle)
	}
	return linearInLog(re, middleRe, middle, DragCrisisEnd, strouhalBeyond)
}

// linearInLog interpolates y linearly in log x between two points.
func linearInLog(x, x0, y0, x1, y1 float64) float64 {
	return y0 + (y1-y0)*math.Log(x/x0)/math.Log(x1/x0)
}

var strouhalEntry = &Entry{
	Name:     "Strouhal",
	Problem:  "vortex shedding frequency of a section in cross flow",
	Equation: "circle: 0.212(1 − 21.2/Re) for Re 47 to 150; 0.212(1 − 12.7/Re) for 300 to 2000; 0.20 for 1e4 to 2e5; linear in log Re between; 0.18 to 0.48 for 2e5 to 3.5e6; 0.22 to 0.28 beyond",
	Args: []Arg{
		{Name: "reynolds", Symbol: "Re", Doc: "Reynolds number on the width across the flow", Min: 0, Max: strouhalMaxReynolds, From: 30, To: 1e8, Typical: 1e4},
		{Name: "shape", Symbol: "shape", Doc: "section", Choices: sectionShapeNames(), Optional: true},
		{Name: "depth_ratio", Symbol: "d/b", Doc: "dimension along the flow over that across it", Min: 0.1, Max: 20, Optional: true, Default: 1},
	},
	Outputs: []Output{
		{ID: "strouhal", Symbol: "St", Doc: "Strouhal number; 0 where nothing is shed"},
		{ID: "low", Symbol: "St_min", Doc: "lower end of its band"},
		{ID: "high", Symbol: "St_max", Doc: "upper end of its band"},
	},
	Accuracy: 0.1,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Roshko1954, cite.Williamson1996, cite.Bearman1969, cite.Okajima1982, cite.Blevins1990, cite.EN1991Strouhal},
	Note:     "smooth surface and stream; within the drag crisis only the band means anything; open sections carry the envelope of all open sections; an iced cable is taken as a circle",
	Limits: []Limit{
		{"circle beyond the drag crisis: 0.25", "strouhal", High, 1e-12, func(a []float64) float64 {
			if SectionShapes()[int(a[1])] != SectionCircle {
				return math.NaN()
			}
			return strouhalBeyond
		}},
	},
	Eval: func(a []float64) ([]float64, error) {
		st, lo, hi, err := Strouhal(a[0], SectionShapes()[int(a[1])], a[2])
		return []float64{st, lo, hi}, err
	},
}
