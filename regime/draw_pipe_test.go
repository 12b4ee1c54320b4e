package regime_test

func init() {
	structures["pipe"] = (*drawer).pipe
}

// pipe draws a pipe or hose: from a capillary to a main, of any support.
func (d *drawer) pipe() {
	bore := d.log(1e-3, 2)
	d.quantity("structure.inner_diameter", bore)
	if d.chance(7) {
		d.quantity("structure.wall_thickness", written(bore*d.log(0.004, 0.5)))
	}
	if d.chance(7) {
		d.quantity("structure.length", written(bore*d.log(3, 1000)))
	}
	support := "pinned-pinned"
	if d.chance(6) {
		support = pick(d, "pinned-pinned", "clamped-free", "clamped-free", "clamped-clamped", "clamped-pinned")
		d.name("structure.support", support)
	}
	d.material()
	d.maybe(1, "structure.mass_per_length", 100*bore*bore, 2e4*bore*bore)
	if d.chance(1) {
		d.quantity("structure.bending_stiffness", written(d.log(1e4, 1e11)*bore*bore*bore*bore))
	}
	d.frequencies(1, 1e-2/bore, 3/bore)
	if d.chance(1) {
		d.number("structure.mode", pick(d, 1.0, 2, 3))
	}
	if support != "clamped-free" {
		d.maybe(1, "structure.tension", 1e3*bore*bore, 1e7*bore*bore)
		if d.chance(2) {
			d.switchOf("structure.ends_held")
		}
	}
	if d.chance(3) {
		d.put("structure.inclination", entry{x: pick(d, -1.5, -0.4, 0, 0.3, 1.57)})
	}
	d.column(bore)
}

// column draws what matters to the column of fluid and around the pipe.
func (d *drawer) column(bore float64) {
	d.maybe(2, "structure.column_length", 3*bore, 3e4*bore)
	if d.chance(3) {
		d.name("structure.anchoring", pick(d, "upstream", "throughout", "expansion-joints"))
	}
	if d.chance(5) {
		d.maybe(7, "structure.closure_time", 1e-5, 100)
	} else if d.chance(3) {
		d.quantity("structure.closure_time", 0)
	}
	if d.chance(2) {
		d.quantity("structure.speed_change", pick(d, 0, 0.01, 1))
	}
	if d.chance(2) {
		d.name("structure.column_ends", pick(d, "open-closed", "open-open", "closed-closed"))
	}
	d.maybe(2, "structure.roughness", 1e-6*bore, 0.03*bore)
	if d.chance(2) {
		d.quantity("structure.external_density", d.log(700, 1500))
		d.maybe(5, "structure.external_viscosity", 1e-4, 1)
	}
	if d.chance(5) {
		d.quantity("fluid.pressure", d.log(1.5e5, 1e6)) // well above the ambient pressure: a difference keeps fewer digits
	}
	d.name("fluid.name", pick(d, "water", "water", "blood", "air"))
}
