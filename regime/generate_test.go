package regime_test

import (
	"math"
	"slices"
	"strconv"

	"pgregory.net/rapid"

	"regimed/regime/finding"
	"regimed/regime/fluid"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/solid"
	"regimed/units"
)

// drawer draws a sample. Numbers are log-uniform over what engineers meet, and
// rounded to what a person writes.
type drawer struct {
	*rapid.T
	sample
}

// structures draw the structure of a kind with an eye for what belongs together.
var structures = map[string]func(d *drawer){"generic": (*drawer).generic, "cylinder": (*drawer).cylinder, "plate": (*drawer).plate}

// cases draws cases of the kinds above with any of the optional fields.
func cases() *rapid.Generator[*sample] {
	return casesOf("tank", "tank", "floater", "floater", "generic", "cylinder", "cylinder", "plate", "plate", "pipe", "pipe", "vessel", "section", "section", "wing", "tube_array", "tube_array", "flag", "piston", "film", "microbeam")
}

// anyCases draws the structure of every kind that there is field by field, so
// that what does not belong together meets too; many of these cases are refused.
func anyCases() *rapid.Generator[*sample] {
	var names []string
	for _, k := range kind.All {
		names = append(names, k.Name)
	}
	return drawn(func(d *drawer) { d.fields(kind.Schema().Kind(d.kind).Fields, 5) }, true, names)
}

func casesOf(names ...string) *rapid.Generator[*sample] {
	return drawn(func(d *drawer) { structures[d.kind](d) }, false, names)
}

// drawn draws a case of one of the kinds, with a structure and what surrounds it.
func drawn(structure func(d *drawer), blocks bool, kinds []string) *rapid.Generator[*sample] {
	return rapid.Custom(func(t *rapid.T) *sample {
		d := &drawer{T: t}
		d.kind = pick(d, kinds...)
		structure(d)
		d.fluid()
		d.flow()
		d.gaps()
		d.damping()
		d.motion()
		d.sea()
		d.surroundings()
		d.study()
		d.givenGroups()
		d.active()
		if blocks {
			d.otherBlocks()
		}
		return &d.sample
	})
}

// otherBlocks gives blocks that the drawer has no functions for, field by field.
func (d *drawer) otherBlocks() {
	for _, b := range kind.Schema().Blocks {
		if !slices.Contains(drawnBlocks, b.Name) && d.chance(1) {
			d.fields(b.Fields, 5)
		}
	}
}

// drawnBlocks are the blocks that the drawer has functions for.
var drawnBlocks = []string{"fluid", "flow", "waves", "motion", "surroundings", "tolerance", "criteria", "given_groups", "active"}

// fields gives what is needed of a list of fields, and each of the others in n
// of 8 cases.
func (d *drawer) fields(list []*input.Field, n int) {
	for _, f := range list {
		frequency, modes := d.has("structure.frequency_dry") || d.has("structure.frequency_wet"), d.has("structure.modes")
		rival := map[string]bool{"log_decrement": true, "loss_factor": true, "quality_factor": true, "damping_ratio": true,
			"frequency_dry": frequency || modes, "frequency_wet": frequency || modes, "modes": frequency || d.chance(6)}
		if !f.Needed && (rival[f.Name] || !d.chance(n)) {
			continue
		}
		d.put(f.Path(), d.value(f))
	}
}

// value draws a value of a field by its type alone.
func (d *drawer) value(f *input.Field) entry {
	e := entry{f: f}
	switch f.Type {
	case input.Quantity:
		e.x = d.usual(f)
	case input.Number:
		e.x = d.log(0.01, 0.9)
	case input.Integer:
		e.x = pick(d, 1.0, 2, 3)
	case input.Flag:
		e.flag = d.chance(4)
	case input.Choice:
		e.text = pick(d, f.Options...)
	case input.Choices:
		e.list = []string{pick(d, f.Options...)}
	case input.Interval:
		x := d.usual(f)
		e.ends = [2]float64{x / 2, x}
	case input.Rows:
		for range pick(d, 1, 2, 3) {
			var row []entry
			for _, g := range f.Row.Fields {
				if g.Needed || d.chance(5) {
					row = append(row, d.value(g))
				}
			}
			e.rows = append(e.rows, row)
		}
	default:
		e.text = "drawn"
	}
	return e
}

// usual is a quantity as it might be of a structure of about a metre: in powers
// of a length, a density and a speed, whatever its dimension.
func (d *drawer) usual(f *input.Field) float64 {
	switch f.Kind {
	case units.Modulus:
		return d.log(1e6, 3e11)
	case units.Angle:
		return d.log(0.001, 0.5)
	case units.Salinity:
		return 35
	case units.Temperature:
		return d.log(280, 300)
	}
	m, l, t := f.Kind.Exponents()
	const length, density, speed = 0.5, 2000, 30
	x := math.Pow(density, float64(m)) * math.Pow(length, float64(l+3*m+t)) * math.Pow(speed, float64(-t))
	return written(x * d.log(0.03, 30))
}

func pick[T any](d *drawer, list ...T) T {
	return rapid.SampledFrom(list).Draw(d.T, "pick")
}

// chance is true in about n of 8 cases.
func (d *drawer) chance(n int) bool { return rapid.IntRange(0, 7).Draw(d.T, "chance") < n }

// share is a number between 0 and 1, in 64 steps: two draws of eight, which the
// drawing of integers does not crowd towards 0.
func (d *drawer) share() float64 {
	return float64(8*rapid.IntRange(0, 7).Draw(d.T, "coarse")+rapid.IntRange(0, 7).Draw(d.T, "fine")) / 63
}

func (d *drawer) log(lo, hi float64) float64 { return written(lo * math.Pow(hi/lo, d.share())) }

// written rounds to four digits.
func written(x float64) float64 {
	r, _ := strconv.ParseFloat(strconv.FormatFloat(x, 'g', 4, 64), 64)
	return r
}

func (d *drawer) quantity(path string, x float64) {
	e := entry{x: x}
	if d.chance(1) {
		e.spread = 0.02
	}
	d.put(path, e)
}

func (d *drawer) name(path, text string)        { d.put(path, entry{text: text}) }
func (d *drawer) number(path string, x float64) { d.put(path, entry{x: x}) }
func (d *drawer) switchOf(path string)          { d.put(path, entry{flag: d.chance(4)}) }

// maybe gives a quantity in n of 8 cases.
func (d *drawer) maybe(n int, path string, lo, hi float64) {
	if d.chance(n) {
		d.quantity(path, d.log(lo, hi))
	}
}

// material gives a solid by name, by values, or both.
func (d *drawer) material() {
	if d.chance(5) {
		d.name("structure.material", pick(d, solid.Names()...))
		d.maybe(1, "structure.density", 900, 9000)
	} else {
		d.maybe(6, "structure.density", 900, 9000)
		d.maybe(6, "structure.young_modulus", 1e6, 3e11)
	}
	if d.chance(1) {
		d.number("structure.poisson_ratio", pick(d, 0, 0.25, 0.3, 0.45))
	}
	if d.chance(1) {
		d.number("structure.linear_strain", d.log(1e-4, 0.5))
	}
}

// frequencies gives a dry or a wet frequency in n of 8 cases.
func (d *drawer) frequencies(n int, lo, hi float64) {
	if !d.chance(n) {
		return
	}
	f := d.log(lo, hi)
	if d.chance(5) {
		d.quantity("structure.frequency_dry", f)
		return
	}
	d.quantity("structure.frequency_wet", f)
	if d.chance(2) {
		d.quantity("structure.frequency_dry", written(1.3*f))
	}
}

func (d *drawer) generic() {
	l := d.log(1e-4, 20)
	d.quantity("structure.length", l)
	d.maybe(5, "structure.volume", 0.3*l*l*l, 20*l*l*l)
	d.maybe(5, "structure.mass", 3*l*l*l, 3e5*l*l*l)
	d.maybe(3, "structure.density", 30, 9000)
	if d.chance(6) {
		d.name("structure.shape", pick(d, "bluff", "streamlined", "plate", "sphere"))
	}
	if d.chance(2) {
		d.number("structure.added_mass_coefficient", pick(d, 0, 0.2, 1, 4.5))
	}
	d.frequencies(7, 1e-3/l, 30/l)
	d.maybe(3, "structure.span", 0.5*l, 100*l)
	d.maybe(4, "structure.thickness", 0.005*l, 0.5*l)
	d.maybe(2, "structure.frontal_area", 0.1*l*l, 20*l*l)
	d.maybe(2, "structure.drag_coefficient", 0.005, 3)
	d.maybe(1, "structure.lift_coefficient", 0.02, 1)
	d.maybe(1, "structure.strouhal", 0.08, 0.3)
	d.maybe(2, "structure.next_frequency", 1e-2/l, 100/l)
	if d.chance(3) {
		d.put("structure.flow_stiffness", entry{x: pick(d, -1.0, 1) * d.log(1e-6, 1e4)})
	}
	if d.chance(3) {
		d.number("structure.galloping_factor", pick(d, -2, 0, 0.4, 1.2, 3))
	}
	d.maybe(3, "structure.divergence_speed", 0.3, 300)
	d.maybe(3, "structure.flutter_speed", 0.3, 300)
	d.maybe(2, "structure.stall_angle", 0.05, 0.4)
	d.maybe(1, "structure.suction_peak", 0.05, 4)
}

func (d *drawer) cylinder() {
	diameter := d.log(1e-5, 8)
	if d.chance(6) {
		d.quantity("structure.diameter", diameter)
	} else {
		d.quantity("structure.radius", diameter/2)
	}
	support := "pinned-pinned"
	if d.chance(6) {
		support = pick(d, "pinned-pinned", "clamped-free", "clamped-clamped", "clamped-pinned", "taut", "elastic", "spring-mounted")
		d.name("structure.support", support)
	}
	length := diameter * d.log(2, 800)
	if d.chance(1) { // where a rule for "slender" may end
		length = diameter * pick(d, 5.0, 15, 10)
	}
	if d.chance(6) {
		d.quantity("structure.length", written(length))
	}
	d.tube(diameter)
	d.material()
	d.maybe(2, "structure.mass_per_length", 50*diameter*diameter, 2e4*diameter*diameter)
	d.maybe(1, "structure.bending_stiffness", 1e6*math.Pow(diameter, 4), 1e10*math.Pow(diameter, 4))
	lo, hi := 1e-2/diameter, 10/diameter
	if support == "spring-mounted" {
		d.frequencies(7, lo, hi)
	} else {
		d.frequencies(2, lo, hi)
	}
	known := d.has("structure.frequency_dry") || d.has("structure.frequency_wet")
	if support == "taut" && !known || d.chance(1) {
		d.quantity("structure.tension", d.log(1e4*diameter*diameter, 1e9*diameter*diameter))
	}
	if support == "elastic" && !known || d.chance(1) {
		d.quantity("structure.support_stiffness", d.log(1e5, 1e12)*math.Pow(diameter, 4)/length)
	}
	if support == "clamped-free" && d.chance(2) {
		d.quantity("structure.tip_mass", d.log(1, 1e4)*diameter*diameter*length)
	}
	if d.chance(2) {
		d.number("structure.mode", pick(d, 1.0, 2, 3, 5))
	}
	d.maybe(1, "structure.roughness", 1e-6*diameter, 0.03*diameter)
	if d.chance(2) {
		d.name("structure.free_end", pick(d, "tapered", "blunt"))
	}
	if d.chance(2) {
		d.switchOf("structure.ends_held")
	}
	d.maybe(1, "structure.drag_coefficient", 0.2, 2)
	d.maybe(1, "structure.strouhal", 0.1, 0.4)
	d.maybe(1, "structure.lift_coefficient", 0.02, 1)
}

// tube makes the cylinder hollow in half of the cases, and fills some.
func (d *drawer) tube(diameter float64) {
	if !d.chance(4) {
		return
	}
	d.quantity("structure.wall_thickness", written(diameter*d.log(0.005, 0.4)))
	if d.chance(3) {
		d.quantity("structure.contents_density", d.log(1, 2000))
		if d.chance(4) {
			d.switchOf("structure.contents_included")
		}
	}
}

// aspects are the ratios of sides that are drawn: few, since each new one asks
// for a costly solution that is then remembered.
var aspects = []float64{0.05, 0.25, 1, 1.5, 4, 15}

func (d *drawer) plate() {
	a := pick(d, 1e-4, 3e-4, 0.01, 0.1, 0.3, 1, 2, 10)
	circular := d.chance(2)
	if circular {
		d.quantity("structure.radius", a)
		if d.chance(6) {
			d.name("structure.edges", pick(d, "simply-supported", "clamped", "SSSS", "CCCC"))
		}
	} else {
		d.quantity("structure.length", a)
		d.quantity("structure.width", a/pick(d, aspects...))
		if d.chance(6) {
			d.name("structure.edges", pick(d, "SSSS", "CCCC", "CFFF", "CFFF", "SCSC", "CFCF", "SFSF", "simply-supported", "clamped"))
		}
	}
	h := a * d.log(5e-4, 0.1)
	if d.chance(7) {
		d.quantity("structure.thickness", written(h))
	}
	d.material()
	d.maybe(1, "structure.mass_per_area", 100*h, 2e4*h)
	d.maybe(1, "structure.bending_stiffness", 1e5*h*h*h, 1e11*h*h*h)
	d.frequencies(1, 0.1/a, 300/a)
	if d.chance(2) {
		d.number("structure.mode_m", pick(d, 1.0, 2, 3))
		d.number("structure.mode_n", pick(d, 1.0, 2))
	}
	if d.chance(6) {
		d.number("structure.wetted_sides", pick(d, 1.0, 2))
	}
	if d.chance(2) {
		d.switchOf("structure.baffled")
	}
	if d.chance(2) {
		d.switchOf("structure.edges_held")
	}
	d.maybe(3, "structure.tension", 1e2*h, 1e8*h)
}

// fluid gives none, one by name with its state, or one by values.
func (d *drawer) fluid() {
	switch rapid.IntRange(0, 7).Draw(d.T, "fluid") {
	case 0:
		return
	case 1, 2, 3, 4:
		d.named()
		d.maybe(1, "fluid.density", 1, 1100)
	default:
		d.byValues()
	}
}

func (d *drawer) named() {
	name := pick(d, append([]string{"water", "seawater", "air", "air"}, fluid.Names()...)...)
	d.name("fluid.name", name)
	switch name {
	case "water", "seawater", "air":
		d.maybe(2, "fluid.temperature", 278, 305)
		if d.chance(1) && name == "seawater" {
			d.quantity("fluid.salinity", 30)
		}
	}
}

func (d *drawer) byValues() {
	gas := d.chance(4)
	rho, c := d.log(500, 2000), d.log(900, 2500)
	ν := d.log(1e-7, 1e-2)
	if gas {
		rho, c, ν = d.log(0.05, 20), d.log(150, 1200), d.log(1e-7, 10)
	}
	if d.chance(7) {
		d.quantity("fluid.density", rho)
	}
	if d.chance(6) {
		d.quantity("fluid.sound_speed", c)
	}
	switch rapid.IntRange(0, 7).Draw(d.T, "viscosity") {
	case 0:
	case 1, 2, 3:
		d.quantity("fluid.kinematic_viscosity", ν)
	case 4:
		d.quantity("fluid.kinematic_viscosity", ν)
		d.quantity("fluid.viscosity", ν*rho)
	default:
		d.quantity("fluid.viscosity", written(ν*rho))
	}
	if d.chance(3) {
		d.name("fluid.phase", map[bool]string{true: "gas", false: "liquid"}[gas])
	}
	d.maybe(3, "fluid.vapour_pressure", 1, 1e5)
	d.maybe(3, "fluid.surface_tension", 1e-3, 0.5)
	if d.chance(2) {
		d.number("fluid.heat_capacity_ratio", pick(d, 1.1, 1.4, 1.67))
		d.number("fluid.prandtl_number", pick(d, 0.01, 0.7, 10))
	}
	d.maybe(2, "fluid.pressure", 1e3, 1e7)
}

func (d *drawer) flow() {
	if len(kind.Find(d.kind).Directions) == 0 {
		return
	}
	if !d.has("fluid.name") && !d.has("fluid.density") && !d.has("fluid.sound_speed") || !d.chance(6) {
		return
	}
	top := 40.0
	if gas := d.word("fluid.name") == "air" || d.number0("fluid.density") < 30; gas {
		top = 900
	}
	u := d.log(1e-2, top)
	switch rapid.IntRange(0, 7).Draw(d.T, "speed") {
	case 0:
		d.quantity("flow.speed", 0)
	case 1:
		d.put("flow.operating", entry{ends: [2]float64{u / 4, u}})
	case 2:
		d.quantity("flow.speed", u)
		d.put("flow.operating", entry{ends: [2]float64{0, written(1.5 * u)}})
	default:
		d.quantity("flow.speed", u)
	}
	if directions := kind.Find(d.kind).Directions; len(directions) > 0 && d.chance(5) {
		d.name("flow.direction", pick(d, directions...))
	}
	if d.chance(4) {
		d.put("flow.turbulence_intensity", entry{x: d.log(1e-3, 0.5)})
		d.maybe(5, "flow.turbulence_length", 1, 300)
	}
	if d.chance(2) {
		d.put("flow.incidence", entry{x: pick(d, -0.2, -0.05, 0, 0.03, 0.3)})
	}
}

func (d *drawer) number0(path string) float64 {
	if i := d.at(path); i >= 0 {
		return d.given[i].x
	}
	return 1000
}

func (d *drawer) damping() {
	if field(d.kind, "structure.damping_ratio") == nil {
		return
	}
	ζ := d.log(1e-4, 0.1)
	switch rapid.IntRange(0, 7).Draw(d.T, "damping") {
	case 0, 1:
		d.put("structure.damping_ratio", entry{x: ζ})
	case 2:
		d.put("structure.log_decrement", entry{x: written(2 * math.Pi * ζ)})
	case 3:
		d.put("structure.loss_factor", entry{x: written(2 * ζ)})
	case 4:
		d.put("structure.quality_factor", entry{x: written(1 / (2 * ζ))})
	case 5:
		d.put("structure.damping_ratio", entry{x: 0})
	}
}

// size is the length by which the sample's motion and surroundings are measured.
func (d *drawer) size() float64 {
	for _, path := range []string{"structure.diameter", "structure.length", "structure.radius", "structure.breadth", "structure.depth", "structure.chord"} {
		if i := d.at(path); i >= 0 && (d.kind != "cylinder" || path != "structure.length") {
			return d.given[i].x
		}
	}
	return 1
}

func (d *drawer) motion() {
	d.maybe(5, "motion.amplitude", 1e-6*d.size(), 0.5*d.size())
	if d.chance(1) {
		d.quantity("motion.frequency", d.log(1e-2/d.size(), 30/d.size()))
	}
}

func (d *drawer) surroundings() {
	l := d.size()
	d.maybe(1, "surroundings.gravity", 1.6, 30)
	if d.chance(1) && !d.has("fluid.name") {
		d.quantity("surroundings.ambient_pressure", d.log(1e4, 1e7))
		if i := d.at("fluid.pressure"); i >= 0 && d.chance(4) {
			d.given[i].gauge, d.given[i].spread = true, 0
		}
	}
	radius := l
	if d.kind == "cylinder" && d.has("structure.diameter") {
		radius = l / 2
	}
	if d.kind != "cylinder" || !d.has("surroundings.shell_diameter") {
		d.maybe(2, "surroundings.wall_gap", 1e-3*l, 3*l)
	}
	if d.kind != "plate" && !d.has("surroundings.wall_gap") {
		d.maybe(2, "surroundings.shell_diameter", 2.02*radius, 20*radius)
	}
	if d.chance(1) { // where a rule for "near" may end
		d.quantity("surroundings.depth_below_surface", 10*l)
	} else {
		d.maybe(2, "surroundings.depth_below_surface", 1.1*radius, 40*radius)
	}
	if d.chance(1) && d.has("surroundings.wall_gap") {
		d.quantity("surroundings.wall_gap", l)
	}
	d.neighbour()
	if d.kind == "plate" {
		d.maybe(2, "surroundings.backing_depth", 0.01*l, 5*l)
	}
}

func (d *drawer) study() {
	if d.chance(1) {
		d.name("title", "a drawn case")
	}
	if d.chance(3) {
		all := finding.MeasureNames()
		list := slices.DeleteFunc(all, func(string) bool { return d.chance(3) })
		if len(list) > 0 {
			d.put("interest", entry{list: list})
		}
	}
	if d.chance(3) {
		d.name("tolerance.preset", pick(d, "design", "screening", "detailed"))
	}
	for _, path := range []string{"tolerance.frequency", "tolerance.load", "tolerance.response"} {
		if d.chance(1) {
			d.put(path, entry{x: d.log(1e-3, 1)})
		}
	}
	if d.chance(1) {
		d.name("criteria.lock_in", pick(d, "asme-n1324", "dnv-c205", "en-1991-1-4", "ptc-19.3"))
		if d.kind == "tube_array" {
			d.name("criteria.fluidelastic", pick(d, "pettigrew-taylor-1991", "asme-n1331-lower", "asme-n1331-mean", "connors-1970"))
		}
	}
	if d.chance(1) {
		d.name("criteria.galloping", "en-1991-1-4-e2")
		d.name("criteria.divergence", "en-1991-1-4-e4")
	}
}

// givenGroups replaces one quantity by the group that it closes.
func (d *drawer) givenGroups() {
	if !d.chance(1) {
		return
	}
	switch rapid.IntRange(0, 4).Draw(d.T, "group") {
	case 0:
		if !d.has("fluid.name") && d.has("flow.speed") && d.number0("flow.speed") > 0 {
			d.drop("fluid.viscosity")
			d.drop("fluid.kinematic_viscosity")
			d.put("given_groups.reynolds", entry{x: d.log(10, 1e7)})
		}
	case 1:
		d.drop("motion.amplitude")
		d.put("given_groups.displacement", entry{x: d.log(1e-4, 0.5)})
	case 2:
		if !d.has("fluid.name") && d.has("flow.speed") && d.number0("flow.speed") > 0 {
			d.drop("fluid.sound_speed")
			d.put("given_groups.mach", entry{x: d.log(1e-3, 2)})
		}
	case 3:
		if d.has("flow.speed") && d.number0("flow.speed") > 0 && d.kind == "generic" {
			d.drop("structure.frequency_dry")
			d.drop("structure.frequency_wet")
			d.put("given_groups.reduced_velocity", entry{x: d.log(0.1, 100)})
		}
	case 4:
		if d.kind == "generic" && (d.has("fluid.name") || d.has("fluid.density")) && d.has("structure.volume") {
			d.drop("structure.mass")
			d.drop("structure.density")
			d.put("given_groups.mass_ratio", entry{x: d.log(0.1, 1e4)})
		}
	}
}
