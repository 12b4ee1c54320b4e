package whatif

import (
	"context"
	"fmt"
	"math"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
)

// stream is a rod across a stream, by values, from which groups follow that are
// powers of its inputs.
const stream = `{"structure": {"kind": "cylinder", "diameter": "30 mm", "length": "3 m", "mass_per_length": "3 kg/m", "frequency_dry": "40 Hz", "damping_ratio": 0.01},
	"fluid": {"density": "1000 kg/m3", "kinematic_viscosity": "1 mm2/s", "sound_speed": "1480 m/s", "phase": "liquid"}, "flow": {"speed": "0.2 m/s"}, "motion": {"amplitude": "1 mm"}}`

// Where an estimate is a power of its inputs, the drivers are its exponents.
func TestDriversOfPowers(t *testing.T) {
	water := exploring(t, stream)
	box := exploring(t, `{"structure": {"kind": "generic", "length": "0.1 m", "mass": "2 kg", "volume": "0.5 L", "frequency_dry": "5 Hz"},
		"fluid": {"density": "1000 kg/m3", "viscosity": "1 mPa s", "phase": "liquid"}, "motion": {"amplitude": "3 mm"}}`)
	rows := 0
	for _, r := range []struct {
		a     *regime.Answer
		entry *assumption.Entry
		input string
		want  float64
	}{
		{water, assumption.LinearCompressible, "flow.speed", 1}, // M
		{water, assumption.LinearCompressible, "fluid.sound_speed", -1},
		{water, assumption.LaminarFlow, "flow.speed", 1}, // Re
		{water, assumption.LaminarFlow, "structure.diameter", 1},
		{water, assumption.LaminarFlow, "fluid.kinematic_viscosity", -1},
		{water, assumption.SmallStroke, "motion.amplitude", 1}, // ξ/L
		{water, assumption.SmallStroke, "structure.diameter", -1},
		{box, assumption.SmallStroke, "motion.amplitude", 1},
		{box, assumption.SmallStroke, "structure.length", -1},
	} {
		if got := driverOf(r.a, r.entry, r.input); math.Abs(got-r.want) > 1e-6 {
			t.Errorf("%s by %s: %v, not %v", r.entry.ID, r.input, got, r.want)
		}
		rows++
	}
	if rows != 9 {
		t.Errorf("%d rows", rows)
	}
}

// A central difference of ln u is exact to the square of its step: here is the
// error without the fluid, √(1 + μ) − 1, whose exponent is known.
func TestDriversOfAnError(t *testing.T) {
	a := exploring(t, `{"structure": {"kind": "generic", "length": "0.1 m", "mass": "2 kg", "frequency_dry": "5 Hz", "volume": "0.5 L", "added_mass_coefficient": 0.5},
		"fluid": {"density": "1000 kg/m3", "phase": "liquid"}}`)
	const mu = 0.5 * 1000 * 0.5e-3 / 2
	exact := mu / (2 * math.Sqrt(1+mu) * (math.Sqrt(1+mu) - 1)) // ∂ln u/∂ln μ
	signs := map[string]float64{"structure.mass": -1, "structure.volume": 1, "fluid.density": 1, "structure.added_mass_coefficient": 1}
	rows := 0
	for _, d := range a.Drivers[assumption.FluidAbsent.Index()] {
		if want := signs[d.Place.Path()] * exact; math.Abs(d.Sensitivity-want) > 1e-6 {
			t.Errorf("%s: %v, not %v", d.Place.Path(), d.Sensitivity, want)
		}
		rows++
	}
	if rows != 3 { // the three largest of four that are alike
		t.Errorf("%d rows", rows)
	}
}

// A zero, a whole number and a tolerance drive nothing; a utilisation at one of
// its bounds is driven by nothing.
func TestNoDrivers(t *testing.T) {
	a := exploring(t, `{"structure": {"kind": "cylinder", "diameter": "30 mm", "length": "3 m", "mass_per_length": "3 kg/m", "frequency_dry": "40 Hz", "damping_ratio": 0, "mode": 1},
		"fluid": {"density": "1000 kg/m3", "viscosity": "1 mPa s", "sound_speed": "1480 m/s", "phase": "liquid"}, "flow": {"speed": "0.2 m/s", "operating": ["0 m/s", "0.3 m/s"]}, "tolerance": {"frequency": 0.03}}`)
	bounded := 0
	for i, list := range a.Drivers {
		u, judged := a.Findings[i].Utilisation()
		if judged && clipped(u) {
			bounded++
			if len(list) > 0 {
				t.Errorf("%s at %v is driven by %v", assumption.Catalogue[i].ID, u, list)
			}
		}
		for _, d := range list {
			switch d.Place.Path() {
			case "structure.damping_ratio", "structure.mode", "flow.operating.0", "tolerance.frequency":
				t.Errorf("%s drives %s", d.Place.Path(), assumption.Catalogue[i].ID)
			}
		}
	}
	if bounded == 0 {
		t.Error("no utilisation at a bound")
	}
}

// At the end of its range an input is varied to the inside only; where both
// sides disagree, at a bend, there is no sensitivity.
func TestSlopesAgree(t *testing.T) {
	none := math.NaN()
	rows := 0
	for _, r := range []struct {
		pair slopePair
		want float64
	}{
		{slopePair{2, 2.004, false}, 2.002},
		{slopePair{1, -1, false}, none},
		{slopePair{100, 100.5, false}, 100.25},
		{slopePair{none, 3, true}, 3},
		{slopePair{-2, none, true}, -2},
		{slopePair{none, 3, false}, none},
		{slopePair{none, none, false}, none},
	} {
		if got := r.pair.agreed(); math.IsNaN(got) != math.IsNaN(r.want) || math.Abs(got-r.want) > 1e-12 {
			t.Errorf("%+v: %v, not %v", r.pair, got, r.want)
		}
		rows++
	}
	if rows != 7 {
		t.Errorf("%d rows", rows)
	}
}

func TestSlopesAtTheEndOfARange(t *testing.T) {
	const plate = `{"structure": {"kind": "plate", "length": "1 m", "width": "0.6 m", "thickness": "4 mm", "material": "steel", "edges": "SSSS"},
		"fluid": {"name": "seawater", "temperature": "20 degC", "salinity": "%v g/kg"}}`
	var found []float64
	for _, salinity := range []float64{39.9, 40} { // the model ends at 40 g/kg
		a, bad := regime.Classify(exploringCase(t, fmt.Sprintf(plate, salinity)))
		if len(bad) > 0 {
			t.Fatal(bad)
		}
		x, err := newExplorer(context.Background(), a)
		if err != nil {
			t.Fatal(err)
		}
		for i := range x.routes {
			if x.routes[i].place.Path() == "fluid.salinity" {
				found = append(found, x.explore(&x.routes[i]).sensitivity[assumption.FluidAbsent.Index()])
			}
		}
	}
	if len(found) != 2 || !(found[0] > 0) || math.Abs(found[1]/found[0]-1) > 0.01 {
		t.Errorf("sensitivities %v", found)
	}
}
