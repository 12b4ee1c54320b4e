package similar

import (
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/units"
)

// QuantityDef says how a quantity of the model follows from the factors.
type QuantityDef struct {
	ID     string
	Title  string
	Usual  bool // listed whether or not the case has it
	powers func(n nature) Powers
}

// always are powers that do not depend on the case.
func always(terms ...term) func(nature) Powers {
	p := product(terms...)
	return func(nature) Powers { return p }
}

// quantityDefs are the quantities, those of the flow first. Forces of the flow go
// with ρU²L², forces in the structure with E L²: they agree where the Cauchy number
// is kept.
var quantityDefs = []QuantityDef{
	{"length", "length", true, always(to(Length, 1))},
	{"area", "area", true, always(to(Length, 2))},
	{"volume", "volume", true, always(to(Length, 3))},
	{"speed", "speed of the flow", true, always(to(Speed, 1))},
	{"time", "time", true, always(to(Time, 1))},
	{"frequency", "frequency of what drives or excites", true, always(to(Time, -1))},
	{"acceleration", "acceleration", true, always(to(Length, 1), to(Time, -2))},
	{"gravity", "gravity", true, always(to(Gravity, 1))},

	{"fluid_density", "density of the fluid", true, always(to(FluidDensity, 1))},
	{"kinematic_viscosity", "kinematic viscosity", true, always(to(KinematicViscosity, 1))},
	{"dynamic_viscosity", "dynamic viscosity", true, always(to(FluidDensity, 1), to(KinematicViscosity, 1))},
	{"sound_speed", "speed of sound", true, always(to(SoundSpeed, 1))},
	{"surface_tension", "surface tension", true, always(to(SurfaceTension, 1))},
	{"static_pressure", "static pressure above vapour", true, always(to(StaticPressure, 1))},

	{"pressure", "pressure of the flow", true, always(to(FluidDensity, 1), to(Speed, 2))},
	{"force", "force of the flow", true, always(to(FluidDensity, 1), to(Speed, 2), to(Length, 2))},
	{"force_per_length", "force of the flow per length", true, always(to(FluidDensity, 1), to(Speed, 2), to(Length, 1))},
	{"moment", "moment of the flow", true, always(to(FluidDensity, 1), to(Speed, 2), to(Length, 3))},
	{"power", "power", true, always(to(FluidDensity, 1), to(Speed, 3), to(Length, 2))},
	{"energy", "energy", true, always(to(FluidDensity, 1), to(Speed, 2), to(Length, 3))},
	{"flow_stiffness", "stiffness by the flow", false, always(to(FluidDensity, 1), to(Speed, 2), to(Length, 1))},

	{"solid_density", "density of the structure", true, always(to(SolidDensity, 1))},
	{"mass", "mass of the structure", true, always(to(SolidDensity, 1), to(Length, 3))},
	{"mass_per_length", "mass per length", true, always(to(SolidDensity, 1), to(Length, 2))},
	{"mass_per_area", "mass per area", true, always(to(SolidDensity, 1), to(Length, 1))},
	{"inertia", "moment of inertia", true, always(to(SolidDensity, 1), to(Length, 5))},
	{"inertia_per_length", "moment of inertia per length", false, always(to(SolidDensity, 1), to(Length, 4))},
	{"young_modulus", "Young's modulus", true, always(to(YoungModulus, 1))},
	{"stress", "stress in the structure by the flow", true, always(to(FluidDensity, 1), to(Speed, 2))},
	{"strain", "strain in the structure by the flow", true, always(to(FluidDensity, 1), to(Speed, 2), to(YoungModulus, -1))},
	{"bending_stiffness_beam", "bending stiffness EI of a beam", true, always(to(YoungModulus, 1), to(Length, 4))},
	{"bending_stiffness_plate", "bending stiffness D of a plate", true, always(to(YoungModulus, 1), to(Length, 3))},
	{"stiffness", "stiffness of a spring", true, always(to(YoungModulus, 1), to(Length, 1))},
	{"stiffness_per_length", "stiffness per length", false, always(to(YoungModulus, 1))},
	{"rotational_stiffness", "rotational stiffness", true, always(to(YoungModulus, 1), to(Length, 3))},
	{"tension", "tension", true, always(to(YoungModulus, 1), to(Length, 2))},
	{"tension_per_length", "tension per length", false, always(to(YoungModulus, 1), to(Length, 1))},
	{"natural_frequency", "natural frequency of the structure", true, nature.natural},
	{"damping_coefficient", "damping coefficient, same ratio", true,
		func(n nature) Powers { return n.natural().plus(product(to(SolidDensity, 1), to(Length, 3))) }},

	{"restoring_stiffness", "stiffness by the waterplane", false, always(to(FluidDensity, 1), to(Gravity, 1), to(Length, 2))},
	{"restored_period", "natural period of a floating body", false, always(root(FluidDensity, -1), root(Gravity, -1), root(SolidDensity, 1), root(Length, 1))},
	{"onset_speed", "speed of divergence or flutter", false, always(root(YoungModulus, 1), root(FluidDensity, -1))},
	{"capacitance", "capacitance, of the same material", false, always(to(Length, 1))},
	{"load_resistance", "resistance of a load, matched as before", false, func(n nature) Powers { return n.natural().plus(product(to(Length, 1))).times(minusOne) }},
	{"coil_resistance", "resistance of a coil, of the same metal", false, always(to(Length, -1))},
	{"force_factor", "force factor, at the same flux density", false, always(to(Length, 1))},
}

func quantityIndex(id string) int {
	for i := range quantityDefs {
		if quantityDefs[i].ID == id {
			return i
		}
	}
	return -1
}

// byKind says which quantity a field of a structure is, by the kind of what it
// holds. What is not listed has no scale: numbers, angles, temperatures.
var byKind = map[units.Kind]string{
	units.Length: "length", units.Area: "area", units.Volume: "volume", units.Mass: "mass", units.Time: "time",
	units.Frequency: "natural_frequency", units.Speed: "speed", units.Acceleration: "acceleration", units.Density: "solid_density",
	units.MassPerLength: "mass_per_length", units.MassPerArea: "mass_per_area", units.Inertia: "inertia", units.InertiaPerLength: "inertia_per_length",
	units.Force: "tension", units.ForcePerLength: "tension_per_length", units.PressureDifference: "pressure", units.GaugePressure: "pressure",
	units.Modulus: "young_modulus", units.DynamicViscosity: "dynamic_viscosity", units.KinematicViscosity: "kinematic_viscosity",
	units.SurfaceTension: "surface_tension", units.Stiffness: "stiffness", units.StiffnessPerLength: "stiffness_per_length",
	units.RotationalStiffness: "rotational_stiffness", units.BendingStiffnessBeam: "bending_stiffness_beam",
	units.BendingStiffnessPlate: "bending_stiffness_plate", units.Capacitance: "capacitance", units.ForceFactor: "force_factor",
}

// byPath says it for fields whose kind does not.
var byPath = map[string]string{
	"structure.altitude":             "", // stands for the state of the air
	"structure.contents_density":     "fluid_density",
	"structure.external_density":     "fluid_density",
	"structure.gas_density":          "fluid_density",
	"structure.flow_stiffness":       "flow_stiffness",
	"structure.divergence_speed":     "onset_speed",
	"structure.flutter_speed":        "onset_speed",
	"structure.restoring_stiffness":  "restoring_stiffness",
	"structure.natural_period_heave": "restored_period",
	"structure.natural_period_pitch": "restored_period",
	"structure.pulse_frequency":      "frequency",
	"active.load_resistance":         "load_resistance",
	"active.coil_resistance":         "coil_resistance",
}

// quantityOf returns the index of the quantity that a place of a case holds; −1
// where it has no scale of its own.
func quantityOf(p input.Place) int {
	if p.Field == kind.MotionFrequency {
		return quantityIndex("frequency")
	}
	if id, listed := byPath[p.Field.Path()]; listed && p.List == nil {
		return quantityIndex(id)
	}
	return quantityIndex(byKind[p.Kind()])
}
