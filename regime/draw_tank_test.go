package regime_test

import (
	"math"

	"regimed/regime/kind"
)

func init() {
	structures["tank"] = (*drawer).tank
	structures["floater"] = (*drawer).floater
}

// tank draws a tank with its liquid, its wall and what shakes it.
func (d *drawer) tank() {
	l := d.log(0.1, 60)
	round := d.chance(4)
	if round {
		d.quantity(pick(d, "structure.diameter", "structure.radius"), l)
	} else {
		d.quantity("structure.length", l)
		d.maybe(6, "structure.width", 0.1*l, 3*l)
	}
	if d.chance(2) {
		d.name("structure.shape", map[bool]string{true: "cylindrical", false: "rectangular"}[round])
	}
	h := written(l * d.log(0.03, 2))
	d.quantity("structure.liquid_depth", h)
	switch pick(d, 0, 1, 2) {
	case 0:
		d.quantity("structure.height", written(h*d.log(1.01, 3)))
	case 1:
		d.maybe(6, "structure.freeboard", 0.01*h, 2*h)
	}
	d.maybe(6, "structure.wall_thickness", 1e-4*l, 0.03*l)
	d.material()
	d.frequencies(1, 0.3/math.Sqrt(l), 50/l)
	f := written(0.6 / math.Sqrt(l) * d.log(0.2, 6))
	switch pick(d, 0, 1, 2, 3, 4) {
	case 0:
		d.maybe(7, "structure.spectral_acceleration", 0.01, 3)
	case 1:
		d.quantity("motion.frequency", f)
		d.maybe(6, "structure.base_acceleration", 0.001, 5)
	case 2, 3:
		d.quantity("motion.frequency", f)
		d.maybe(7, "motion.amplitude", 1e-5*l, 0.05*l)
	}
	d.maybe(1, "structure.sloshing_damping", 1e-3, 0.1)
}

// floater draws a body at the surface by its shape.
func (d *drawer) floater() {
	l := d.log(0.1, 80)
	shape := pick(d, "vertical-cylinder", "horizontal-cylinder", "sphere", "box")
	if shape != "vertical-cylinder" || d.chance(6) {
		d.name("structure.shape", shape)
	}
	fixed := d.chance(2)
	if fixed {
		d.put("structure.fixed", entry{flag: true})
	}
	draft := written(l * d.log(0.05, 4))
	switch shape {
	case "box":
		d.quantity("structure.length", l)
		d.maybe(6, "structure.width", 0.2*l, 5*l)
		d.quantity("structure.draft", draft)
	case "vertical-cylinder":
		d.quantity("structure.diameter", l)
		d.quantity("structure.draft", draft)
	case "horizontal-cylinder":
		d.quantity("structure.diameter", l)
		d.quantity("structure.length", written(l*d.log(1, 20)))
		d.maybe(4, "structure.draft", 0.1*l, 0.95*l)
	default:
		d.quantity("structure.radius", l/2)
		d.maybe(4, "structure.draft", 0.1*l, 0.95*l)
	}
	d.maybe(2, "structure.mass", 50*l*l*l, 5e3*l*l*l)
	d.maybe(1, "structure.waterplane_area", 0.01*l*l, 2*l*l)
	d.maybe(1, "structure.volume", 0.1*l*l*l, 2*l*l*l)
	d.maybe(1, "structure.added_mass_coefficient", 0.1, 3)
	if fixed {
		d.frequencies(6, 0.5/math.Sqrt(l), 30/math.Sqrt(l))
	} else {
		d.maybe(2, "structure.natural_period_heave", math.Sqrt(l), 8*math.Sqrt(l))
		d.maybe(2, "structure.natural_period_pitch", math.Sqrt(l), 8*math.Sqrt(l))
		d.maybe(4, "structure.mooring_stiffness", l*l, 1e5*l*l)
	}
	d.maybe(1, "structure.drag_coefficient", 0.1, 2)
	d.maybe(1, "structure.strouhal", 0.1, 0.3)
	d.maybe(1, "structure.lift_coefficient", 0.02, 1)
}

// sea makes what shakes a tank agree, gives what has a surface a liquid, and draws
// waves for a kind that may stand in them.
func (d *drawer) sea() {
	k := kind.Find(d.kind)
	if d.has("structure.base_acceleration") {
		d.drop("motion.amplitude")
	}
	if d.has("structure.spectral_acceleration") {
		d.drop("motion.frequency")
	}
	if k.Surface && !d.liquid() {
		for _, path := range []string{"fluid.name", "fluid.density", "fluid.viscosity", "fluid.kinematic_viscosity", "fluid.sound_speed", "fluid.phase", "fluid.vapour_pressure",
			"fluid.surface_tension", "fluid.heat_capacity_ratio", "fluid.prandtl_number", "fluid.pressure", "fluid.temperature", "fluid.salinity"} {
			if f := field(d.kind, path); f != nil {
				d.drop(path)
			}
		}
		d.name("fluid.name", pick(d, "water", "seawater"))
	}
	if d.kind == "plate" && d.word("fluid.name") != "" && d.chance(1) {
		d.number("structure.wetted_sides", 1)
		d.maybe(7, "surroundings.shock_pressure", 1e4, 1e8)
		d.maybe(7, "surroundings.shock_decay_time", 1e-5, 1e-2)
	}
	if !k.Waves || !d.liquid() || d.word("flow.direction") == "axial" {
		return
	}
	if d.kind == "cylinder" && !d.chance(2) || d.kind == "floater" && !d.chance(6) {
		return
	}
	if d.has("flow.speed") || d.has("flow.operating") {
		d.name("flow.direction", "cross")
	}
	t := written(math.Sqrt(d.size()) * d.log(0.6, 12))
	length := 1.56 * t * t // deep water
	if d.chance(7) {
		d.quantity("waves.period", t)
	}
	if d.chance(7) || !d.has("waves.period") {
		d.quantity("waves.height", written(length*d.log(0.002, 0.15)))
	}
	draft := 0.0
	if i := d.at("structure.draft"); i >= 0 {
		draft = d.given[i].x
	}
	d.maybe(4, "waves.depth", math.Max(1.1*draft, 0.03*length)+d.size(), 2*length+2*draft+2*d.size())
	d.maybe(3, "waves.air_gap", 0.01*length, 0.3*length)
}

// liquid reports whether the fluid drawn is surely a liquid.
func (d *drawer) liquid() bool {
	switch d.word("fluid.name") {
	case "water", "seawater":
		return !d.has("fluid.phase") && d.number0("fluid.density") > 100
	}
	return false
}
