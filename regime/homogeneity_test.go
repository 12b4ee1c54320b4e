package regime_test

import (
	"math"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// byValue returns the sample with every name replaced by the values that it
// stands for, and with every default that has a dimension written out.
func byValue(s *sample, a *regime.Answer) *sample {
	v := s.clone()
	look := func(path string, id scale.ID) {
		if field(v.kind, path) != nil && a.Scales.Has(id) {
			v.put(path, entry{x: a.Scales.X(id)})
		}
	}
	if v.has("structure.altitude") { // stands for the state of the air there
		v.drop("structure.altitude")
		look("fluid.pressure", scale.Pressure)
	}
	if v.has("fluid.name") {
		for _, path := range []string{"fluid.name", "fluid.temperature", "fluid.salinity"} {
			v.drop(path)
		}
		look("fluid.density", scale.Density)
		look("fluid.viscosity", scale.Viscosity)
		look("fluid.sound_speed", scale.SoundSpeed)
		look("fluid.vapour_pressure", scale.VapourPressure)
		look("fluid.surface_tension", scale.SurfaceTension)
		look("fluid.heat_capacity_ratio", scale.HeatCapacityRatio)
		look("fluid.prandtl_number", scale.Prandtl)
		v.put("fluid.phase", entry{text: map[bool]string{true: "gas", false: "liquid"}[a.Groups.Is(group.Gas)]})
	}
	if v.has("structure.material") {
		v.drop("structure.material")
		look("structure.density", scale.SolidDensity)
		look("structure.young_modulus", scale.Young)
		look("structure.poisson_ratio", scale.Poisson)
		look("structure.linear_strain", scale.LinearStrain)
	}
	look("surroundings.gravity", scale.Gravity)
	look("surroundings.ambient_pressure", scale.AmbientPressure)
	if v.has("fluid.pressure") {
		look("fluid.pressure", scale.Pressure) // absolute, also where a gauge pressure was given
	}
	return v
}

// scaled multiplies masses, lengths and times by three factors.
func scaled(s *sample, mass, length, time float64) *sample {
	v := s.clone()
	for i := range v.given {
		v.given[i] = v.given[i].scaled(mass, length, time)
	}
	return v
}

func (e entry) scaled(mass, length, time float64) entry {
	switch e.f.Type {
	case input.Rows:
		rows := make([][]entry, len(e.rows))
		for i, row := range e.rows {
			for _, x := range row {
				rows[i] = append(rows[i], x.scaled(mass, length, time))
			}
		}
		e.rows = rows
	case input.Quantity, input.Interval:
		f := powerOf(e.f.Kind, mass, length, time)
		e.x *= f
		e.ends[0] *= f
		e.ends[1] *= f
	}
	return e
}

func powerOf(k units.Kind, mass, length, time float64) float64 {
	m, l, t := k.Exponents()
	return math.Pow(mass, float64(m)) * math.Pow(length, float64(l)) * math.Pow(time, float64(t))
}

// Dimensional homogeneity: multiply all masses, lengths and times of a case by
// any three factors, and nothing without a dimension changes. A name stands
// for values, so that these replace it first; this too changes nothing.
func TestDimensionalHomogeneity(t *testing.T) {
	check(t, func(rt *rapid.T, s *sample, c *tally) {
		a := c.classify(rt, s, asAnalystsWrite)
		if a == nil {
			return
		}
		plain := byValue(s, a)
		b := mustClassify(rt, plain, inSI)
		if d := (comparison{relative: 1e-12}).answers(a, b); d != "" {
			rt.Fatalf("names replaced by their values: %s\n%s", d, pretty(plain.document(inSI)))
		}
		factor := func(label string) float64 {
			return math.Pow(10, 6*rapid.Float64Range(0, 1).Draw(rt, label)-3)
		}
		other := scaled(plain, factor("mass"), factor("length"), factor("time"))
		if d := (comparison{relative: 1e-9}).answers(b, mustClassify(rt, other, inSI)); d != "" {
			rt.Fatalf("%s\n%s\n%s", d, pretty(plain.document(inSI)), pretty(other.document(inSI)))
		}
	})
}

func mustClassify(t *rapid.T, s *sample, spell speller) *regime.Answer {
	doc := s.document(spell)
	a, bad, err := classify(doc)
	if err != nil || len(bad) > 0 {
		t.Fatalf("%v %v\n%s", err, bad, pretty(doc))
	}
	return a
}
