package regime_test

func init() {
	structures["vessel"] = (*drawer).vessel
}

// vessel draws a compliant tube, from an arteriole to a soft pump line.
func (d *drawer) vessel() {
	radius := d.log(5e-5, 0.02)
	d.quantity("structure.radius", radius)
	if d.chance(7) {
		d.quantity("structure.wall_thickness", written(radius*d.log(0.03, 0.8)))
	}
	if d.chance(7) {
		d.quantity("structure.length", written(radius*d.log(1, 200)))
	}
	if d.chance(4) {
		d.quantity("structure.density", d.log(900, 1500))
		d.quantity("structure.young_modulus", d.log(2e4, 2e7))
	} else {
		d.material()
	}
	if d.chance(4) { // in others the motion may give it
		d.quantity("structure.pulse_frequency", d.log(0.3, 500))
	}
	d.maybe(4, "structure.pulse_pressure", 100, 3e4)
	if d.chance(3) {
		d.quantity("structure.peak_speed", 60) // above any mean speed of a liquid that is drawn
	}
	if d.chance(3) {
		d.quantity("structure.external_pressure", d.log(1.0e5, 1.4e5))
	}
	if d.chance(5) {
		d.quantity("fluid.pressure", d.log(1.0e5, 1.3e5))
	}
	d.name("fluid.name", pick(d, "blood", "blood", "water"))
}
