package regime_test

func init() {
	structures["piston"] = (*drawer).piston
	structures["film"] = (*drawer).film
	structures["microbeam"] = (*drawer).microbeam
}

// piston draws a diaphragm, from an earphone to a projector.
func (d *drawer) piston() {
	a := d.log(2e-3, 0.6)
	d.quantity("structure.radius", a)
	d.maybe(7, "structure.moving_mass", 0.3*a*a*a, 3e4*a*a*a)
	d.maybe(3, "structure.thickness", 2e-3*a, 0.3*a)
	if d.chance(3) {
		d.quantity("structure.density", d.log(200, 9000))
	}
	if d.chance(3) {
		d.quantity("structure.stiffness", d.log(1e2, 1e7)*a)
	} else {
		d.frequencies(7, 1/a, 3e3/a)
	}
	if d.chance(6) {
		d.switchOf("structure.baffled")
	}
	if d.chance(3) {
		d.quantity("structure.enclosure_volume", written(a*a*a*d.log(1, 200)))
	}
	if d.chance(2) {
		d.quantity("structure.stroke", written(a*d.log(1e-5, 0.4)))
	}
}

// film draws a plate over a film, from a pressure cell to a thrust plate.
func (d *drawer) film() {
	a := d.log(1e-4, 0.3)
	b := a
	if d.chance(2) {
		d.quantity("structure.radius", a)
	} else {
		b = a / pick(d, aspects...)
		d.quantity("structure.length", a)
		d.quantity("structure.width", b)
	}
	least := min(a, b)
	d.quantity("structure.gap", written(least*d.log(1e-3, 0.5)))
	if d.chance(3) {
		d.quantity("structure.moving_mass", written(a*b*least*d.log(20, 5e3)))
	} else {
		d.maybe(7, "structure.thickness", 5e-3*least, 0.3*least)
		d.maybe(7, "structure.density", 900, 9000)
	}
	if d.chance(2) {
		d.quantity("structure.stiffness", d.log(1e4, 1e8)*a)
	} else {
		d.frequencies(7, 1/a, 300/a)
	}
	if d.chance(4) {
		d.switchOf("structure.open_back")
	}
	if d.chance(2) {
		d.quantity("structure.stroke", written(least*d.log(1e-6, 1e-3)))
	}
}

// microbeam draws a small beam, from a probe to a quartz fork.
func (d *drawer) microbeam() {
	b := d.log(2e-6, 1e-3)
	l := b * d.log(2, 60)
	d.quantity("structure.width", b)
	d.quantity("structure.length", written(l))
	if d.chance(7) {
		d.quantity("structure.thickness", written(l*d.log(2e-3, 0.05)))
	}
	d.material()
	support := "clamped-free"
	if d.chance(6) {
		support = pick(d, "clamped-free", "clamped-clamped", "tuning-fork")
		d.name("structure.support", support)
	}
	if support == "tuning-fork" && d.chance(6) {
		d.quantity("structure.prong_gap", written(b*d.log(0.02, 3)))
	}
	if d.chance(3) {
		d.number("structure.mode", pick(d, 1.0, 2, 3, 5))
	}
	d.frequencies(1, 1e-1/l, 30/l)
}

// active draws an active part in some of the cases.
func (d *drawer) active() {
	if !d.chance(1) {
		return
	}
	if d.chance(2) { // a dielectric elastomer of 0.1 to 10 MPa
		d.quantity("active.maxwell_stress", d.log(1e3, 1e7))
		d.maybe(8, "active.shear_modulus", 3e4, 3e6)
		return
	}
	if d.kind == "piston" || d.kind == "generic" || d.kind == "film" {
		d.maybe(7, "active.force_factor", 0.1, 20)
		d.maybe(6, "active.coil_resistance", 0.5, 500)
		d.maybe(2, "active.load_resistance", 0.5, 500)
		return
	}
	if d.chance(6) {
		d.number("active.electromechanical_coupling", d.log(1e-3, 2))
	} else {
		d.number("active.coupling_factor", d.log(0.02, 0.8))
	}
	if d.chance(4) {
		d.quantity("active.load_resistance", d.log(10, 1e7))
		d.maybe(6, "active.capacitance", 1e-12, 1e-6)
	}
}
