package regime_test

import "math"

func init() {
	structures["tube_array"] = (*drawer).tubeArray
	structures["flag"] = (*drawer).flag
}

// tubeArray draws a tube in a bundle: from a micro heat exchanger to a boiler.
func (d *drawer) tubeArray() {
	diameter := d.log(1e-3, 0.08)
	d.quantity("structure.diameter", diameter)
	ratio := pick(d, 1.2, 1.3, 1.5, 1.75, 2.5)
	if d.chance(4) {
		d.number("structure.pitch_ratio", ratio)
	} else {
		d.quantity("structure.pitch", ratio*diameter)
	}
	if d.chance(7) {
		d.name("structure.layout", pick(d, "30", "45", "60", "90"))
	}
	support := "pinned-pinned"
	if d.chance(6) {
		support = pick(d, "pinned-pinned", "clamped-clamped", "clamped-pinned", "clamped-free", "spring-mounted")
		d.name("structure.support", support)
	}
	if d.chance(7) {
		d.quantity("structure.length", written(diameter*d.log(8, 150)))
	}
	d.tube(diameter)
	d.material()
	d.maybe(2, "structure.mass_per_length", 500*diameter*diameter, 1e4*diameter*diameter)
	d.frequencies(3, 0.1/diameter, 10/diameter)
	d.supportsOfTube(support, diameter)
	d.maybe(3, "structure.damping_ratio_wet", 1e-3, 0.08)
	if d.chance(2) {
		d.number("structure.spans", pick(d, 2.0, 5, 12))
		d.quantity("structure.support_thickness", d.log(3e-3, 0.03))
	}
	d.maybe(5, "structure.duct_width", 10*diameter, 300*diameter)
	d.maybe(1, "structure.strouhal", 0.1, 0.8)
	d.maybe(1, "structure.lift_coefficient", 0.02, 1)
	d.maybe(1, "structure.drag_coefficient", 0.1, 2)
	d.maybe(1, "structure.bending_stiffness", 1e6*math.Pow(diameter, 4), 1e10*math.Pow(diameter, 4))
}

func (d *drawer) supportsOfTube(support string, diameter float64) {
	if support == "clamped-free" || support == "spring-mounted" {
		return
	}
	d.maybe(1, "structure.tension", 1e4*diameter*diameter, 1e8*diameter*diameter)
	if d.chance(1) {
		d.number("structure.mode", pick(d, 1.0, 2, 3))
	}
}

// gaps gives the flow through an array by its speed in the gaps in some cases,
// and makes some liquids two-phase.
func (d *drawer) gaps() {
	if d.kind != "tube_array" {
		return
	}
	if i := d.at("flow.speed"); i >= 0 && d.given[i].x > 0 && d.chance(4) {
		u := d.given[i].x
		d.drop("flow.speed")
		d.drop("flow.operating")
		d.quantity("flow.gap_speed", u)
	}
	liquid := !d.has("fluid.name") && d.has("fluid.density") && d.sample.number("fluid.density") > 400 && d.word("fluid.phase") != "gas"
	if liquid && d.has("fluid.pressure") && d.chance(4) {
		d.number("structure.void_fraction", pick(d, 0.05, 0.3, 0.6, 0.9))
		d.quantity("structure.gas_density", d.log(0.5, 60))
	}
}

// flag draws a flag: from a strip of film to a banner, in some cases behind a
// body or clamped at its trailing edge.
func (d *drawer) flag() {
	l := d.log(0.01, 3)
	d.quantity("structure.length", l)
	d.quantity("structure.width", l*pick(d, 0.1, 0.2, 0.5, 1, 4, 20))
	h := l * d.log(1e-4, 0.06)
	d.maybe(7, "structure.thickness", h, h*1.01)
	d.material()
	d.maybe(3, "structure.mass_per_area", 100*h, 1e4*h)
	d.maybe(2, "structure.bending_stiffness", 1e5*h*h*h, 1e11*h*h*h)
	d.frequencies(2, 1e-3/l, 30/l)
	switch pick(d, "plain", "plain", "behind", "inverted") {
	case "behind":
		d.quantity("structure.leading_body", l*d.log(0.05, 1))
		d.maybe(2, "structure.strouhal", 0.1, 0.25)
	case "inverted":
		d.name("structure.clamped_edge", "trailing")
	default:
		if d.chance(2) {
			d.name("structure.clamped_edge", "leading")
		}
	}
}

// neighbour gives a cylinder a neighbour in some cases.
func (d *drawer) neighbour() {
	if d.kind != "cylinder" || !d.chance(2) {
		return
	}
	diameter := d.size()
	if !d.has("structure.diameter") {
		diameter *= 2
	}
	d.quantity("surroundings.neighbour_spacing", written(diameter*d.log(1.1, 30)))
	switch pick(d, "none", "tandem", "side-by-side", "angle", "staggered") {
	case "tandem":
		d.name("surroundings.neighbour_arrangement", "tandem")
	case "side-by-side":
		d.name("surroundings.neighbour_arrangement", "side-by-side")
	case "angle":
		d.quantity("surroundings.neighbour_angle", d.log(0.05, 1.5))
	case "staggered":
		d.name("surroundings.neighbour_arrangement", "staggered")
		d.quantity("surroundings.neighbour_angle", d.log(0.2, 1.3))
	}
}
