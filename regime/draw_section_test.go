package regime_test

import "math"

func init() {
	structures["section"] = (*drawer).section
	structures["wing"] = (*drawer).wing
}

// section draws a section: from a wire with ice to a bridge deck.
func (d *drawer) section() {
	depth := d.log(5e-3, 6)
	d.quantity("structure.depth", depth)
	shape := "bluff"
	if d.chance(7) {
		shape = pick(d, "circle", "square", "rectangle", "rectangle", "i_section", "h_section", "channel", "tee", "iced_cable", "bluff", "deck", "deck", "plate")
		d.name("structure.shape", shape)
	}
	breadth := depth
	if shape != "circle" && shape != "square" && d.chance(6) {
		breadth = written(depth * d.log(0.3, 15))
		if d.chance(1) { // where a rule for "elongated" may end
			breadth = depth * pick(d, 2.0, 3)
		}
		d.quantity("structure.breadth", breadth)
	}
	if shape == "deck" || shape == "plate" || shape == "bluff" {
		if d.chance(5) {
			d.switchOf("structure.streamlined")
		}
		if d.chance(2) {
			d.quantity("structure.trailing_edge_thickness", written(depth*d.log(0.05, 0.9)))
		}
	}
	d.maybe(7, "structure.mass_per_length", 20*depth*breadth, 8e3*depth*breadth)
	d.maybe(1, "structure.area", 0.05*depth*breadth, depth*breadth)
	d.maybe(4, "structure.span", 3*depth, 300*depth)
	d.maybe(1, "structure.added_mass_coefficient", 0.3, 2)
	d.maybe(1, "structure.drag_coefficient", 0.1, 2.5)
	d.maybe(1, "structure.lift_slope", 2, 7)
	if d.chance(2) {
		d.number("structure.moment_slope", pick(d, -0.5, 0, 0.8, 1.5))
	}
	d.maybe(1, "structure.lift_coefficient", 0.05, 1.2)
	d.maybe(1, "structure.strouhal", 0.06, 0.3)
	if d.chance(3) {
		d.number("structure.galloping_factor", pick(d, -2, 0, 0.4, 1.2, 3))
	}
	d.maybe(1, "structure.suction_peak", 0.1, 3)
	d.twist(depth, breadth)
}

// twist draws the frequencies and the torsion of a section or wing of a width
// across the flow and a length along it.
func (d *drawer) twist(width, length float64) {
	f := d.log(3e-2/math.Sqrt(width), 30/math.Sqrt(width))
	switch {
	case d.chance(6):
		d.quantity("structure.frequency_bending", f)
	case d.chance(4):
		d.quantity("structure.frequency_dry", f)
	case d.chance(4):
		d.quantity("structure.frequency_wet", f)
	}
	d.maybe(6, "structure.frequency_torsion", 0.6*f, 8*f)
	if m := d.number0("structure.mass_per_length"); d.has("structure.mass_per_length") && d.chance(6) {
		d.quantity("structure.inertia_per_length", written(m*length*length*d.log(0.05, 0.3)))
	}
	if d.chance(4) {
		axis := pick(d, 0.2, 0.33, 0.4, 0.5)
		d.number("structure.elastic_axis", axis)
		d.number("structure.centre_of_gravity", written(axis+pick(d, -0.05, 0, 0.1, 0.15)))
	}
	d.maybe(1, "structure.divergence_speed", 1, 300)
	d.maybe(1, "structure.flutter_speed", 1, 300)
	d.maybe(2, "structure.stall_angle", 0.05, 0.4)
}

// wing draws a wing or foil: from a drone's fin to a transport's wing.
func (d *drawer) wing() {
	chord := d.log(0.02, 6)
	if d.chance(7) {
		d.quantity("structure.chord", chord)
	} else {
		d.quantity("structure.semichord", chord/2)
	}
	d.maybe(6, "structure.span", chord, 12*chord)
	if d.chance(5) {
		d.name("structure.ends", pick(d, "half-wing", "half-wing", "free-tips", "between-walls"))
	}
	thickness := written(chord * d.log(0.03, 0.25))
	if d.chance(6) {
		d.quantity("structure.thickness", thickness)
		if d.chance(2) {
			d.quantity("structure.trailing_edge_thickness", written(thickness*d.log(0.02, 0.5)))
		}
	}
	if d.chance(3) {
		d.material()
	}
	d.maybe(7, "structure.mass_per_length", 3*chord*chord, 500*chord*chord)
	d.maybe(2, "structure.lift_slope", 2, 7)
	if d.chance(3) {
		d.put("structure.sweep", entry{x: pick(d, -0.5, 0.1, 0.35, 0.8)})
	}
	d.maybe(1, "structure.bending_stiffness", 1e3*chord, 1e8*chord)
	d.maybe(1, "structure.torsional_stiffness", 1e2*chord, 1e7*chord)
	d.maybe(1, "structure.drag_coefficient", 0.005, 0.1)
	d.maybe(1, "structure.suction_peak", 0.1, 3)
	d.twist(chord, chord)
}
