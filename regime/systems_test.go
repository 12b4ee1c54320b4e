package regime_test

import (
	"testing"

	"pgregory.net/rapid"

	"regimed/units"
)

// spellings are units of a kind, all of them exact multiples of SI by
// definition: the first is SI, the second what is customary in the US, the
// others what is met besides.
var spellings = map[units.Kind][]string{
	units.Length:                {"m", "ft", "in", "mm", "cm", "km", "µm", "yd", "mil"},
	units.Area:                  {"m2", "ft2", "in2", "mm2", "cm2"},
	units.Volume:                {"m3", "ft3", "gal", "L", "in3", "mm3"},
	units.Mass:                  {"kg", "lbm", "slug", "slinch", "g", "t"},
	units.Frequency:             {"Hz", "rpm", "rad/s", "kHz", "cycle/s"},
	units.Speed:                 {"m/s", "ft/s", "mph", "kn", "km/h", "mm/s"},
	units.Acceleration:          {"m/s2", "ft/s2", "in/s2", "mm/s2"},
	units.Density:               {"kg/m3", "lbm/ft3", "slug/ft3", "slinch/in3", "g/cm3", "t/mm3"},
	units.MassPerLength:         {"kg/m", "lbm/ft", "slug/ft", "g/mm"},
	units.MassPerArea:           {"kg/m2", "lbm/ft2", "slug/ft2", "g/cm2"},
	units.Force:                 {"N", "lbf", "kip", "kN", "kgf", "dyn"},
	units.Pressure:              {"Pa", "psia", "bar", "atm", "kPa", "mbar"},
	units.Modulus:               {"Pa", "ksi", "psi", "GPa", "MPa", "N/mm2"},
	units.DynamicViscosity:      {"Pa s", "lbf s/ft2", "mPa s", "cP", "P", "lbm/(ft s)"},
	units.KinematicViscosity:    {"m2/s", "ft2/s", "cSt", "St", "mm2/s"},
	units.SurfaceTension:        {"N/m", "lbf/ft", "mN/m", "dyn/cm"},
	units.Temperature:           {"K", "degF", "degC", "degR"},
	units.Stiffness:             {"N/m", "lbf/in", "lbf/ft", "kN/mm"},
	units.RotationalStiffness:   {"N m/rad", "lbf ft/rad", "lbf in/rad", "kN m/rad"},
	units.BendingStiffnessBeam:  {"N m2", "lbf ft2", "lbf in2", "kN m2"},
	units.BendingStiffnessPlate: {"N m", "lbf ft", "lbf in", "kN m"},
	units.Angle:                 {"rad", "deg", "mrad"},
	units.ForcePerLength:        {"N/m", "lbf/ft", "lbf/in", "kN/m"},
	units.Salinity:              {"g/kg", "psu", "kg/kg"},
	units.Time:                  {"s", "min", "ms", "h"},
	units.Inertia:               {"kg m2", "lbm ft2", "slug ft2", "g cm2"},
	units.InertiaPerLength:      {"kg m", "lbm ft2/ft", "kg m2/m"},
	units.GaugePressure:         {"Pa", "psig", "barg"},
	units.PressureDifference:    {"Pa", "psi", "kPa", "mbar"},
	units.StiffnessPerLength:    {"N/m2", "lbf/ft2", "kN/m2"},
	units.Resistance:            {"ohm", "kohm", "mohm"},
	units.Capacitance:           {"F", "nF", "uF"},
	units.ForceFactor:           {"T m", "N/A"},
	units.SpecificHeat:          {"J/(kg K)", "kJ/(kg K)"},
	units.ThermalConductivity:   {"W/(m K)", "mW/(m K)"},
}

// inUnit writes x, which is in SI, in a unit.
func inUnit(k units.Kind, x float64, unit string) string {
	return `{"value":` + decimal(fromSI(k, x, unit)) + `,"unit":` + quoted(unit) + `}`
}

// fromSI converts a number in SI to a unit of its kind. Temperatures have a
// zero of their own.
func fromSI(k units.Kind, x float64, unit string) float64 {
	at := func(v float64) float64 {
		q, err := units.FromValueUnit(v, unit, k)
		if err != nil {
			panic(err)
		}
		return q.Value
	}
	if k == units.Temperature {
		zero := map[string]float64{"K": 0, "degR": 0, "degC": 273.15, "degF": 459.67 / 1.8}[unit]
		return (x - zero) / (at(2000) - at(1000)) * 1000
	}
	return x / at(1)
}

// The same case in SI, in US units and in any mix gives the same answer to
// rounding.
func TestUnitsDoNotMatter(t *testing.T) {
	written := map[units.Kind]map[string]bool{}
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		for i := range s.given {
			s.given[i].spread = 0 // of a range the middle is rounded, and of a percentage nothing is gained here
		}
		a := c.classify(rt, s, inSI)
		if a == nil {
			return
		}
		system := rapid.IntRange(1, 3).Draw(rt, "system")
		other := s.document(func(e *entry, k units.Kind, x float64) string {
			list := spellings[k]
			if len(list) < 2 {
				rt.Fatalf("no other unit of a %s is known here", k)
			}
			if written[k] == nil {
				written[k] = map[string]bool{}
			}
			unit := list[1]
			if system > 1 {
				unit = rapid.SampledFrom(list).Draw(rt, "unit")
				for _, rare := range list { // a kind that few cases have shows each of its units all the same
					if !written[k][rare] {
						unit = rare
						break
					}
				}
			}
			written[k][unit] = true
			return inUnit(k, x, unit)
		})
		b, bad, err := classify(other)
		if err != nil || len(bad) > 0 {
			rt.Fatalf("%v %v\n%s", err, bad, pretty(other))
		}
		if d := (comparison{relative: conditioning(s)}).answers(a, b); d != "" {
			rt.Fatalf("%s\n%s\n%s", d, pretty(s.document(inSI)), pretty(other))
		}
	})
	rows := 0
	for k, used := range written {
		rows += len(used)
		if len(used) != len(spellings[k]) {
			t.Errorf("of the units of a %s only %v were written", k, used)
		}
	}
	if rows < 80 {
		t.Errorf("only %d units were written", rows)
	}
}

// conditioning is the relative difference that rounding the input may make:
// 1e-12, but ten times that for a rectangular plate, whose frequency is the
// smallest eigenvalue of a matrix and keeps about 12 digits when the ratio of
// its sides changes by the last bit.
func conditioning(s *sample) float64 {
	if s.kind == "plate" && s.has("structure.width") {
		return 1e-11
	}
	return 1e-12
}
