package kind

import (
	"fmt"
	"math"
	"testing"

	"regimed/regime/group"
)

// A closure at once is the limit of fast ones: the length of the surge, and its
// pressure, don't leap where the closure time leaves 0.
func TestSurgeOfFastClosures(t *testing.T) {
	text := func(closure string) string {
		return `{"structure":{"kind":"pipe","inner_diameter":"0.5 m","wall_thickness":"10 mm","length":"6 m","column_length":"2 km","density":"7850 kg/m3","young_modulus":"200 GPa","poisson_ratio":0.3,"linear_strain":0.001,"anchoring":"throughout","closure_time":"` + closure + `","ends_held":false},"fluid":"water","flow":{"speed":"1 m/s"}}`
	}
	groups := func(closure string) *group.Set {
		r, _ := resolveCase(t, text(closure))
		return r.Groups()
	}
	atOnce := groups("0 s")
	nearly(t, "at once", atOnce.Get(group.SurgeDiameter), 0.5/8000, 1e-12)
	rows := 0
	for _, closure := range []string{"1e-12 s", "1e-9 s", "1e-6 s", "1e-4 s"} {
		g := groups(closure)
		nearly(t, closure, g.Get(group.SurgeDiameter), atOnce.Get(group.SurgeDiameter), 1e-4)
		rows++
	}
	if rows != 4 {
		t.Errorf("%d rows ran", rows)
	}
	last := atOnce.Get(group.SurgeDiameter)
	for _, closure := range []string{"0.1 s", "1 s", "10 s", "100 s"} {
		now := groups(closure).Get(group.SurgeDiameter)
		if !(now < last) {
			t.Errorf("%s: the surge is no longer than that of a faster closure: %g", closure, now)
		}
		last = now
	}
}

// Nothing that a sheet's sides decide leaps where it becomes wider than long,
// than two reciprocal wave numbers, or than a slender body.
func TestSheetsOfAnyWidth(t *testing.T) {
	flag := `{"structure":{"kind":"flag","length":"1 m","width":"%.9f m","mass_per_area":"0.5 kg/m2","bending_stiffness":"0.01 N m","thickness":"0.4 mm"},"fluid":{"density":"1000 kg/m3","kinematic_viscosity":"1e-6 m2/s","sound_speed":"1480 m/s","phase":"liquid"},"flow":{"speed":"1 m/s"}}`
	plate := `{"structure":{"kind":"plate","length":"1 m","width":"%.9f m","thickness":"3 mm","material":"steel","edges":"CFFF","baffled":false},"fluid":"water","flow":{"speed":"1 m/s","direction":"grazing"}}`
	ids := []group.ID{group.AddedMassRatio, group.ViscousInertia, group.ViscousDamping, group.Stokes, group.FlutterSpeed, group.FlowStiffness,
		group.ReducedFrequency, group.AcousticInertia}
	rows := 0
	for name, text := range map[string]string{"flag": flag, "plate": plate} {
		for _, width := range []float64{0.3, 1, 2 / 1.875104, 3} {
			below, _ := resolveCase(t, fmt.Sprintf(text, width*(1-1e-5)))
			above, _ := resolveCase(t, fmt.Sprintf(text, width*(1+1e-5)))
			lower, upper := below.Groups(), above.Groups()
			for _, id := range ids {
				a, b := lower.Get(id), upper.Get(id)
				if math.IsNaN(a) || math.IsNaN(b) {
					t.Errorf("%s of width %g: %s is not known", name, width, group.Of(id).ID)
				}
				if math.Abs(a-b) > 1e-3*math.Abs(a) {
					t.Errorf("%s of width %g: %s leaps from %g to %g", name, width, group.Of(id).ID, a, b)
				}
				rows++
			}
		}
	}
	if rows != 2*4*len(ids) {
		t.Errorf("%d rows ran", rows)
	}
}

// The factor of a sheet lies between those of the ribbon and of the wide sheet,
// and is theirs at the ends.
func TestSheetFactor(t *testing.T) {
	narrow, wide := complex(1.3, -0.4), complex(1.05, -0.05)
	for _, row := range []struct {
		s    float64
		want complex128
	}{{1, narrow}, {0, wide}, {0.5, 2 * narrow * wide / (narrow + wide)}} {
		got := sheetFactor(row.s, narrow, wide)
		nearly(t, "real part", real(got), real(row.want), 1e-12)
		nearly(t, "imaginary part", imag(got), imag(row.want), 1e-12)
	}
	m, share := openMass(1.875, 1, 2)
	nearly(t, "added mass", m, 0.6325, 1e-4)
	nearly(t, "share", share, 0.6486, 1e-3)
}

// A second mode nears the wake gradually: how near it comes has no leap where
// modes cease to be taken as the worst.
func TestSecondModeNearsTheWake(t *testing.T) {
	w := wake{bandLow: 0.65, bandHigh: 1.5, end: 2, first: 1, xLow: 1.1, xHigh: 1.1}
	next := func(ratio float64) float64 {
		w.modes = []float64{1, ratio}
		w.worstMode()
		if w.mode != 1 {
			t.Errorf("mode %d is the worst at a ratio of %g", w.mode, ratio)
		}
		return w.next
	}
	edge := 1.1 / lastShed
	nearly(t, "at the edge", next(edge*(1+1e-6)), next(edge*(1-1e-6)), 1e-5)
	nearly(t, "far from the wake", next(6), 1.1/6/0.65, 1e-12)
	w.modes = []float64{1}
	if w.worstMode(); w.next != 0 {
		t.Errorf("a lone mode has a next one at %g", w.next)
	}
}
