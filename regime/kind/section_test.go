package kind

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime/canon"
)

func near(t *testing.T, what string, got, want, tolerance float64) {
	t.Helper()
	if !(math.Abs(got-want) <= tolerance*math.Abs(want)) {
		t.Errorf("%s is %.6g, want %.6g within %g", what, got, want, tolerance)
	}
}

// The peak suction of sections of the four-digit series by a panel solution with
// sources and a vortex sheet of one strength, 140 panels, and by measurement at
// no incidence (Abbott & von Doenhoff 1959, NACA 0012 in inviscid flow 0.411, from
// memory).
func TestFoilSuction(t *testing.T) {
	degrees := []float64{0, 1, 2, 3, 4, 6, 8, 10}
	rows := map[float64][]float64{
		0.06: {0.208, 0.478, 1.078, 2.014, 3.333, 6.778, 12.103, 18.77},
		0.09: {0.310, 0.490, 0.812, 1.301, 1.945, 3.735, 6.315, 9.471},
		0.12: {0.413, 0.567, 0.792, 1.111, 1.531, 2.683, 4.236, 6.189},
		0.15: {0.517, 0.662, 0.848, 1.092, 1.398, 2.218, 3.309, 4.696},
		0.18: {0.624, 0.764, 0.933, 1.138, 1.388, 2.027, 2.871, 3.913},
		0.21: {0.733, 0.873, 1.034, 1.220, 1.437, 1.971, 2.658, 3.496},
	}
	ran := 0
	for tau, peaks := range rows {
		for i, want := range peaks {
			near(t, "suction peak", foilSuction(tau, degrees[i]*math.Pi/180), want, 0.08)
			ran++
		}
	}
	near(t, "suction of NACA 0012 at no incidence", foilSuction(0.12, 0), 0.411, 0.02)
	if ran != 48 {
		t.Errorf("ran %d rows", ran)
	}
}

// The moment slope of a rectangle falls from near that of a plate, π/2, to
// nothing at a depth of about half its breadth.
func TestMomentSlopeOfARectangle(t *testing.T) {
	slope := func(x float64) float64 { return -6.3*x*x - 0.38*x + 1.6 }
	near(t, "slope of a thin rectangle", slope(0), math.Pi/2, 0.02)
	if slope(0.47) < 0 || slope(0.48) > 0 {
		t.Errorf("slopes %g and %g about a half", slope(0.47), slope(0.48))
	}
}

// Added mass and drag run between the values of their tables and are held beyond.
func TestSectionTables(t *testing.T) {
	rapid.Check(t, func(rt *rapid.T) {
		ratio := math.Pow(10, rapid.Float64Range(-2, 3).Draw(rt, "log ratio"))
		c := &section{b: ratio, d: 1}
		if x := c.rectangleDrag(); !(x >= 0.9 && x <= 2.4) {
			rt.Errorf("drag %g at %g", x, ratio)
		}
		if x := rectangleAdded(ratio); !(x >= 1.01 && x <= 2.23) {
			rt.Errorf("added mass %g at %g", x, ratio)
		}
	})
	near(t, "added mass of a square", rectangleAdded(1), 1.51, 1e-12)
	near(t, "drag of a square", (&section{b: 1, d: 1}).rectangleDrag(), 2.1, 1e-12)
	near(t, "drag of BARC 5 : 1", (&section{b: 5, d: 1}).rectangleDrag(), 1.0, 0.08)
}

// ∫ S_L d ln f = 1, and the size reduction runs from 1 to 1/η.
func TestGusts(t *testing.T) {
	sum := 0.0
	const step = 1e-3
	for y := -16.0; y < 30; y += step { // f from 1e-7 to 1e13
		f := math.Exp(y)
		sum += 6.8 * f / math.Pow(1+10.2*f, 5.0/3) * step
	}
	near(t, "variance of the gusts", sum, 1, 2e-3)
	near(t, "size reduction of a point", sizeReduction(1e-9), 1, 1e-6)
	near(t, "size reduction at the change of form", sizeReduction(1.0001e-3), sizeReduction(0.9999e-3), 1e-6)
	near(t, "size reduction of a long body", sizeReduction(1e4), 1e-4, 1e-4)
	rapid.Check(t, func(rt *rapid.T) {
		eta := math.Exp(rapid.Float64Range(-12, 12).Draw(rt, "log η"))
		if a, b := sizeReduction(eta), sizeReduction(1.01*eta); !(a > b && a <= 1 && b > 0) {
			rt.Errorf("size reduction %g, then %g at η = %g", a, b, eta)
		}
	})
}

// Side ratios outside the tables of Strouhal numbers hold the ends.
func TestStrouhalTablesAreHeld(t *testing.T) {
	for _, shape := range canon.SectionShapes() {
		for _, ratio := range []float64{0, 0.01, 1, 1.2, 5, 400} {
			w := wake{shape: shape, ratio: ratio, strouhal: math.NaN()}
			if st, lo, hi := w.strouhalAt(1e5); !(st > 0.04 && lo <= st && st <= hi && hi < 0.5) {
				t.Errorf("St %g of %s at %g, band %g to %g", st, shape, ratio, lo, hi)
			}
		}
	}
}
