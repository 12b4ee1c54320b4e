package kind

import (
	"regimed/regime/fluid"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/solid"
	"regimed/units"

	"regimed/regime/finding"
)

func quantity(name string, k units.Kind, rule, doc, def string) *input.Field {
	return &input.Field{Name: name, Type: input.Quantity, Kind: k, Rule: rule, Doc: doc, Default: def}
}

func pure(name, rule, doc, def string) *input.Field {
	return &input.Field{Name: name, Type: input.Number, Rule: rule, Doc: doc, Default: def}
}

func whole(name, rule, doc, def string) *input.Field {
	return &input.Field{Name: name, Type: input.Integer, Rule: rule, Doc: doc, Default: def}
}

func choice(name, doc, def string, options ...string) *input.Field {
	return &input.Field{Name: name, Type: input.Choice, Doc: doc, Default: def, Options: options}
}

func flag(name, doc, def string) *input.Field {
	return &input.Field{Name: name, Type: input.Flag, Doc: doc, Default: def}
}

// The fluid.
var (
	FluidName          = choice("name", "a fluid by name; fields that are given beside it take precedence", "", fluid.Names()...)
	FluidPhase         = choice("phase", "liquid or gas, of a fluid by values", "from ρc²/p where these are known", "liquid", "gas")
	FluidTemperature   = quantity("temperature", units.Temperature, "gt=0", "temperature of the fluid", "that of the named fluid's reference state")
	FluidPressure      = quantity("pressure", units.Pressure, "gt=0", "absolute static pressure in the fluid", "the ambient pressure")
	FluidSalinity      = quantity("salinity", units.Salinity, "gte=0", "practical salinity of seawater", "35 g/kg")
	FluidDensity       = quantity("density", units.Density, "gt=0", "density of the fluid", "")
	FluidViscosity     = quantity("viscosity", units.DynamicViscosity, "gt=0", "dynamic viscosity", "")
	FluidKinematic     = quantity("kinematic_viscosity", units.KinematicViscosity, "gt=0", "kinematic viscosity", "")
	FluidSoundSpeed    = quantity("sound_speed", units.Speed, "gt=0", "speed of sound in the fluid", "")
	FluidVapour        = quantity("vapour_pressure", units.Pressure, "gte=0", "vapour pressure of a liquid, absolute", "")
	FluidTension       = quantity("surface_tension", units.SurfaceTension, "gt=0", "surface tension of a liquid", "")
	FluidHeatRatio     = pure("heat_capacity_ratio", "gt=1,lt=2", "ratio of specific heats of a gas", "1.4 for a gas by values")
	FluidPrandtl       = pure("prandtl_number", "gt=0", "Prandtl number", "0.7 for a gas by values")
	fluidBlock         = &input.Block{Name: "fluid", Title: "Fluid", Doc: "the fluid around or inside the structure: by name with its state, or by values", Shorthand: FluidName, Fields: []*input.Field{FluidName, FluidPhase, FluidTemperature, FluidPressure, FluidSalinity, FluidDensity, FluidViscosity, FluidKinematic, FluidSoundSpeed, FluidVapour, FluidTension, FluidHeatRatio, FluidPrandtl}}
	FlowSpeed          = &input.Field{Name: "speed", Type: input.Quantity, Kind: units.Speed, Rule: "gte=0", Doc: "speed of the free stream; a range marked \"as\": \"range\" gives the speeds in service", Service: FlowOperating}
	FlowGapSpeed       = quantity("gap_speed", units.Speed, "gt=0", "speed in the gaps of a tube array, in place of that of the free stream; the speeds of operation then are in the gaps too", "U P/(P − D)")
	FlowDirection      = choice("direction", "how the flow runs to the structure: across it, along it, over its surface, or inside it", "the usual one of the kind", "cross", "axial", "grazing", "internal")
	FlowTurbulence     = pure("turbulence_intensity", "gte=0,lte=2", "r.m.s. of the speed over the mean speed", "not considered")
	FlowGustLength     = quantity("turbulence_length", units.Length, "gt=0", "length scale of the turbulence along the flow; in natural wind some 50 to 300 m", "")
	FlowOperating      = &input.Field{Name: "operating", Type: input.Interval, Kind: units.Speed, Rule: "gte=0", Doc: "lowest and highest speed in service", Default: "from 0 to the speed"}
	FlowIncidence      = quantity("incidence", units.Angle, "gte=-1.6,lte=1.6", "steady angle between the flow and the chord of a streamlined body", "0 deg")
	flowBlock          = &input.Block{Name: "flow", Title: "Mean flow", Doc: "the mean flow; without it the fluid is at rest", Fields: []*input.Field{FlowSpeed, FlowGapSpeed, FlowDirection, FlowTurbulence, FlowGustLength, FlowOperating, FlowIncidence}}
	MotionAmplitude    = quantity("amplitude", units.Length, "gte=0", "largest amplitude of the motion", "")
	MotionFrequency    = quantity("frequency", units.Frequency, "gt=0", "frequency of a forced motion", "the wet natural frequency")
	motionBlock        = &input.Block{Name: "motion", Title: "Motion", Doc: "the motion that matters", Fields: []*input.Field{MotionAmplitude, MotionFrequency}}
	Gravity            = quantity("gravity", units.Acceleration, "gt=0", "acceleration of gravity", "9.80665 m/s2")
	AmbientPressure    = quantity("ambient_pressure", units.Pressure, "gt=0", "absolute pressure of the surroundings", "101325 Pa")
	WallGap            = quantity("wall_gap", units.Length, "gt=0", "gap between the structure and a plane wall", "no wall")
	ShellDiameter      = quantity("shell_diameter", units.Length, "gt=0", "diameter of a concentric shell around a cylinder", "no shell")
	DepthBelowSurface  = quantity("depth_below_surface", units.Length, "gt=0", "depth of the axis or the middle below a free surface", "no free surface")
	BackingDepth       = quantity("backing_depth", units.Length, "gt=0", "depth of a closed cavity behind a plate", "no cavity")
	NeighbourDistance  = quantity("neighbour_spacing", units.Length, "gt=0", "distance between the axis of a cylinder and that of its neighbour, of about the same diameter", "no neighbour")
	NeighbourPlace     = choice("neighbour_arrangement", "how the neighbour stands to the flow", "from the angle", "tandem", "side-by-side", "staggered")
	NeighbourAngle     = quantity("neighbour_angle", units.Angle, "gte=0,lte=1.5707963267948968", "angle between the flow and the line of the two axes: 0 in tandem, 90° side by side", "by the arrangement")
	surroundingsBlock  = &input.Block{Name: "surroundings", Title: "Surroundings", Doc: "walls, surfaces, gravity and pressure", Fields: []*input.Field{Gravity, AmbientPressure, WallGap, ShellDiameter, DepthBelowSurface, BackingDepth, NeighbourDistance, NeighbourPlace, NeighbourAngle, ShockPressure, ShockDecay}}
	Title              = &input.Field{Name: "title", Type: input.Text, Rule: "max=200", Doc: "a title for the case"}
	Reference          = &input.Field{Name: "reference", Type: input.Text, Rule: "max=200", Doc: "a reference of the caller's own: drawing, ticket, source"}
	InterestField      = &input.Field{Name: "interest", Type: input.Choices, Options: finding.MeasureNames(), Doc: "the measures that count in this study", Default: "frequency, load, stability, scale"}
	TolerancePreset    = choice("preset", "tolerances by name", "design", presetNames()...)
	ToleranceFrequency = pure("frequency", "gt=0,lte=1", "accepted relative error of the coupled natural frequency", "that of the preset")
	ToleranceLoad      = pure("load", "gt=0,lte=1", "accepted relative error of the load", "that of the preset")
	ToleranceResponse  = pure("response", "gt=0,lte=1", "accepted share of the damping that is left out", "that of the preset")
	toleranceBlock     = &input.Block{Name: "tolerance", Title: "Tolerance", Doc: "the error that is accepted: a preset by name, or numbers", Shorthand: TolerancePreset, Fields: []*input.Field{TolerancePreset, ToleranceFrequency, ToleranceLoad, ToleranceResponse}}
)

func presetNames() []string {
	var names []string
	for _, p := range finding.Presets {
		names = append(names, p.Name)
	}
	return names
}

// Mass, frequency and damping: the fields that every kind has.
var (
	FrequencyDry  = quantity("frequency_dry", units.Frequency, "gt=0", "natural frequency without fluid", "derived where the kind can")
	FrequencyWet  = quantity("frequency_wet", units.Frequency, "gt=0", "natural frequency in the fluid", "derived from the dry one")
	DampingRatio  = pure("damping_ratio", "gte=0", "structural damping ratio ζ, dry", "")
	LogDecrement  = pure("log_decrement", "gte=0", "logarithmic decrement Δ, in place of the ratio", "")
	LossFactor    = pure("loss_factor", "gte=0", "loss factor η, in place of the ratio", "")
	QualityFactor = pure("quality_factor", "gt=0", "quality factor Q, in place of the ratio", "")
	MaterialName  = choice("material", "a solid by name, for typical values of density, modulus and linear strain", "", solid.Names()...)
	SolidDensity  = quantity("density", units.Density, "gt=0", "density of the solid", "that of the material")
	Young         = quantity("young_modulus", units.Modulus, "gt=0", "Young's modulus", "that of the material")
	PoissonRatio  = pure("poisson_ratio", "gte=0,lt=0.5", "Poisson's ratio", "that of the material, else 0.3")
	LinearStrain  = pure("linear_strain", "gt=0", "strain up to which the material is about linear", "that of the material")
)

// modeFields are what a mode has of its own.
var modeFields = []*input.Field{FrequencyDry, FrequencyWet, DampingRatio, LogDecrement, LossFactor, QualityFactor}

// Modes gives several modes at once; each finding is then that of its worst mode.
var Modes = &input.Field{Name: "modes", Type: input.Rows, Row: &input.Block{Name: "mode", Title: "Mode", Doc: "a mode: its frequency and damping", Fields: modeFields},
	Doc: "several modes, each with the frequency and damping that it has of its own (at most 50)", Default: "the one mode of the structure"}

// modal lists the fields that every kind has, before those of its own.
func modal(own ...*input.Field) []*input.Field {
	return append(append(own, modeFields...), Modes)
}

// elastic lists the fields of a structure made of a material.
func elastic(own ...*input.Field) []*input.Field {
	return append(own, MaterialName, SolidDensity, Young, PoissonRatio, LinearStrain)
}

// givenGroups are the groups that a case may give in place of a quantity.
var givenGroups = []group.ID{group.MassRatio, group.ReducedVelocity, group.Reynolds, group.Stokes, group.Compressibility,
	group.Froude, group.Mach, group.Cauchy, group.Displacement, group.GapRatio, group.Knudsen, group.Bond, group.Weber,
	group.AddedMassRatio, group.ReducedVelocityWet}

var givenFields = func() []*input.Field {
	var fs []*input.Field
	for _, id := range givenGroups {
		d := group.Of(id)
		fs = append(fs, pure(d.ID, "gt=0", d.Title+", "+d.Symbol+" = "+d.Definition, ""))
	}
	return fs
}()

var givenBlock = &input.Block{Name: "given_groups", Title: "Given groups", Doc: "dimensionless groups in place of a missing quantity, as benchmark descriptions give them", Fields: givenFields}
