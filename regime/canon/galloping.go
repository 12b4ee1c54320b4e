package canon

import (
	"math"

	"regimed/regime/cite"
)

// GallopingSpeed is the onset speed of transverse galloping.
//
//	v/(nb) = 2 Sc/a_G
//
// Symbols: sc = Sc = 4πmζ/(ρb²) [1], m mass per length [kg/m], ζ damping ratio [1], b the
// width across the wind [m]; aG = a_G = −(dC_L/dα + C_D) [1] on b; n natural frequency [Hz].
// Range: Sc ≥ 0; a_G ≤ 0: no galloping, +Inf.
// Accuracy: exact for quasi-steady flow, U/(nb) above 15 to 20.
// Check: Sc 10, a_G 1.2: 16.667.
// Source: Den Hartog 1956; EN 1991-1-4 E.2.2 (from memory).
func GallopingSpeed(sc, aG float64) (float64, error) {
	if err := inRange("GallopingSpeed", "scruton", sc, 0, 1e9); err != nil {
		return 0, err
	}
	if err := inRange("GallopingSpeed", "a_g", aG, -1e3, 1e3); err != nil {
		return 0, err
	}
	if aG <= 0 {
		return math.Inf(1), nil
	}
	return 2 * sc / aG, nil
}

// gallopingUnknown is the factor for a section of which none is known
// (EN 1991-1-4 E.2.2, from memory).
const gallopingUnknown = 10.0

// EN 1991-1-4 Table E.7, rectangle (from memory).
var gallopingRectangle = []knot{{1. / 3, 0.4}, {1. / 2, 0.7}, {2. / 3, 1}, {1, 1.2}, {1.5, 1.7}, {2, 2}}

// GallopingFactor is the factor of galloping instability of a section.
//
//	a_G by table of d/b; 10 where none is known
//
// Symbols: depthRatio = d/b [1], d along the wind, b across it; listed: whether
// the table has the section. A circle cannot gallop by symmetry: 0.
// Range: rectangle d/b 1/3 to 2; other ratios and sections get 10, not listed.
// Accuracy: 10 to 20 % by the rounding of the table; turbulence and corners
// change it more. Rectangles longer than d/b 3 reattach, and gallop less.
// Check: square 1.2; rectangle d/b 2: 2.
// Source: EN 1991-1-4 Table E.7 and E.2.2 (from memory).
func GallopingFactor(shape SectionShape, depthRatio float64) (aG float64, listed bool, err error) {
	switch shape {
	case SectionCircle:
		return 0, true, nil
	case SectionIcedCable:
		return 1, true, nil
	case SectionSquare:
		return 1.2, true, nil
	case SectionRectangle, SectionI, SectionH, SectionChannel, SectionTee, SectionBluff:
	default:
		return 0, false, &RangeError{Function: "GallopingFactor", Arg: "shape", Value: math.NaN(), Reason: "unknown section " + string(shape)}
	}
	if err := inRange("GallopingFactor", "depth_ratio", depthRatio, 1e-3, 1e3); err != nil {
		return 0, false, err
	}
	last := gallopingRectangle[len(gallopingRectangle)-1]
	if shape != SectionRectangle || depthRatio < gallopingRectangle[0].x || depthRatio > last.x {
		return gallopingUnknown, false, nil
	}
	return interpolateKnots(depthRatio, gallopingRectangle), true, nil
}

var gallopingSpeedEntry = &Entry{
	Name:     "GallopingSpeed",
	Problem:  "onset speed of transverse galloping of a section",
	Equation: "v/(nb) = 2 Sc/a_G; a_G ≤ 0: none",
	Args: []Arg{
		{Name: "scruton", Symbol: "Sc", Doc: "4πmζ/(ρb²)", Min: 0, Max: 1e9, From: 0.1, To: 1000, Typical: 10},
		{Name: "a_g", Symbol: "a_G", Doc: "−(dC_L/dα + C_D) on the width across the wind", Min: -1e3, Max: 1e3, From: -1, To: 10, Typical: 1.2},
	},
	Outputs:  []Output{{ID: "speed", Symbol: "v/(nb)", Doc: "critical reduced speed; infinite where a_G ≤ 0", Unbounded: true}},
	Accuracy: 1e-12,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.DenHartog1956, cite.EN1991Galloping},
	Note:     "quasi-steady: not for reduced speeds below 15 to 20, nor near vortex resonance (0.7 to 1.5 of its speed)",
	Eval: func(a []float64) ([]float64, error) {
		v, err := GallopingSpeed(a[0], a[1])
		return []float64{v}, err
	},
}

var gallopingFactorEntry = &Entry{
	Name:     "GallopingFactor",
	Problem:  "factor of galloping instability of a section",
	Equation: "a_G by table of d/b; 10 where none is known",
	Args: []Arg{
		{Name: "shape", Symbol: "shape", Doc: "section", Choices: sectionShapeNames(), Typical: 2},
		{Name: "depth_ratio", Symbol: "d/b", Doc: "dimension along the wind over that across it", Min: 1e-3, Max: 1e3, Optional: true, Default: 1, From: 0.2, To: 3},
	},
	Outputs: []Output{
		{ID: "a_g", Symbol: "a_G", Doc: "factor of galloping instability"},
		{ID: "listed", Symbol: "", Doc: "1 where the table has the section, 0 where 10 stands for want of a value"},
	},
	Accuracy: 0.2,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.EN1991Galloping},
	Eval: func(a []float64) ([]float64, error) {
		aG, listed, err := GallopingFactor(SectionShapes()[int(a[0])], a[1])
		if listed {
			return []float64{aG, 1}, err
		}
		return []float64{aG, 0}, err
	},
}
