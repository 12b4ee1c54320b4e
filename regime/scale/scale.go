// Package scale holds the characteristic quantities of a case: the lengths,
// masses, frequencies and speeds from which its groups are made. Each knows
// whether it was given, looked up, derived or assumed, and how.
package scale

import (
	"math"
	"sync"

	"regimed/units"
)

// ID names a scale. The list is append-only.
type ID uint8

// The scales.
const (
	Length ID = iota
	ViscousLength
	Span
	SemiChord
	Thickness
	SectionRadius
	WaveNumber
	DryMass
	DisplacedMass
	AddedMass
	AddedMassFree
	SolidDensity
	Young
	Poisson
	Bending
	Tension
	Stiffness
	FrequencyDry
	FrequencyWet
	FrequencyMotion
	Damping
	Amplitude
	AmplitudeInterest
	CurvatureLength
	LinearStrain

	Speed
	SpeedLow
	SpeedHigh
	Incidence
	StallAngle
	Turbulence
	DragPerLength
	StaticDeflection

	Density
	Viscosity
	KinematicViscosity
	SoundSpeed
	VapourPressure
	SurfaceTension
	HeatCapacityRatio
	Prandtl
	Temperature
	Salinity

	Gravity
	AmbientPressure
	Pressure
	Gap
	WallGap
	ShellDiameter
	Depth
	BackingDepth
	CoincidenceFrequency
	Width
	NextFrequency

	WaveHeight
	FrequencyWave
	WaterDepth
	WaveLength
	ParticleSpeed
	WaveLoad
	WaveDeflection
	AirGap
	FrequencyPitch
	FrequencySurge
	FrequencySlosh
	FrequencySloshThird
	FrequencyExcitation
	BaseAcceleration
	SloshingHeight

	Breadth
	SheddingWidth
	InertiaPerLength
	FrequencyTorsion
	TorsionStiffness
	ElasticAxis
	CentreOfGravity
	LiftSlope
	MomentSlope
	Sweep
	DivergenceSpeed
	FlutterSpeed
	GallopingSpeed
	CriticalSpeed
	TurbulenceLength
	Pitch
	FreeSpeed
	DuctWidth
	GasDensity
	NeighbourSpacing
	BodyDiameter

	WaveSpeed
	ColumnFrequency
	ClosureTime
	SpeedChange
	ExternalDensity
	Roughness
	PulsePressure
	SpeedPeak
	ExternalPressure
	ColumnLength
	ElectromechanicalCoupling
	Capacitance
	LoadResistance
	CoilResistance
	ForceFactor

	ShockPressure
	ShockDecay

	MaxwellStress
	ShearModulus

	Count
)

// Origin says where a scale comes from.
type Origin uint8

// The origins.
const (
	Absent Origin = iota
	Given
	LookedUp
	Derived
	Assumed
)

func (o Origin) String() string {
	return [...]string{"absent", "given", "looked-up", "derived", "assumed"}[o]
}

// Value is one scale of a case, in SI.
type Value struct {
	X      float64
	Kind   units.Kind
	Origin Origin
	Note   string // how it was derived or looked up, or why it is assumed
	Needs  string // where absent: the input that would settle it
}

// Def says what a scale is.
type Def struct {
	ID     string
	Symbol string
	Title  string
	Input  string // path of the input that gives it; may be empty
}

// Set holds the scales of one case.
type Set struct {
	v [Count]Value
}

var sets = sync.Pool{New: func() any { return new(Set) }}

// Release gives the memory of a set back; nothing may use it afterwards.
func (s *Set) Release() { sets.Put(s) }

// New returns a set in which no scale has a value.
func New() *Set {
	s := sets.Get().(*Set)
	*s = Set{}
	for i := range s.v {
		s.v[i].X = math.NaN()
	}
	return s
}

// X returns the value of a scale in SI, NaN where it has none.
func (s *Set) X(id ID) float64 { return s.v[id].X }

// Has reports whether a scale has a value.
func (s *Set) Has(id ID) bool { return s.v[id].Origin != Absent }

// Value returns a scale with its origin.
func (s *Set) Value(id ID) *Value { return &s.v[id] }

// Put gives a scale its value. A value that is not finite leaves it absent.
func (s *Set) Put(id ID, x float64, k units.Kind, o Origin, note string) {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return
	}
	s.v[id] = Value{X: x, Kind: k, Origin: o, Note: note}
}

// Need records which input would settle a scale that is absent.
func (s *Set) Need(id ID, input string) {
	if s.v[id].Origin == Absent {
		s.v[id].Needs = input
	}
}

// Needs returns the input that would settle a scale, empty where the scale
// does not arise.
func (s *Set) Needs(id ID) string {
	return s.v[id].Needs
}

// With returns a copy of the set in which one scale has another number.
func (s *Set) With(id ID, x float64) *Set {
	c := sets.Get().(*Set)
	*c = *s
	c.v[id].X = x
	return c
}

// Of returns the definition of a scale.
func Of(id ID) *Def { return &table[id] }

var table = [Count]Def{
	Length:        {"length", "L", "flow length", "structure.length"},
	ViscousLength: {"viscous_length", "V", "viscous length", ""},
	Span:          {"span", "ℓ", "length of the structure", "structure.length"},
	SemiChord:     {"semichord", "b", "half the length along the flow", ""},
	Thickness:     {"thickness", "h", "thickness", "structure.thickness"},
	SectionRadius: {"radius_of_gyration", "r", "radius of gyration of the section", ""},
	WaveNumber:    {"wave_number", "k_b", "bending wave number of the mode", ""},
	DryMass:       {"dry_mass", "m", "dry mass", "structure.mass"},
	DisplacedMass: {"displaced_mass", "m_d", "mass of the displaced fluid", "structure.volume"},
	AddedMass:     {"added_mass", "m_a", "ideal added mass, confined as given", ""},
	AddedMassFree: {"added_mass_free", "m_a,free", "ideal added mass in unbounded fluid", ""},
	SolidDensity:  {"solid_density", "ρ_s", "density of the solid", "structure.density"},
	Young:         {"young_modulus", "E", "Young's modulus", "structure.young_modulus"},
	Poisson:       {"poisson_ratio", "ν_s", "Poisson's ratio", "structure.poisson_ratio"},
	Bending:       {"bending_stiffness", "B", "bending stiffness", ""},
	Tension:       {"tension", "T", "tension", "structure.tension"},
	Stiffness:     {"stiffness", "k", "structural stiffness of the mode, in the reference of the dry mass", ""},
	FrequencyDry:  {"frequency_dry", "f", "natural frequency, dry", "structure.frequency_dry"},
	FrequencyWet:  {"frequency_wet", "f_w", "natural frequency, wet", "structure.frequency_wet"},
	FrequencyMotion: {"frequency_motion", "f_m", "frequency of the motion: forced, else the wet natural one",
		"motion.frequency"},
	Damping:           {"damping_ratio", "ζ", "structural damping ratio, dry", "structure.damping_ratio"},
	Amplitude:         {"amplitude", "ξ", "amplitude of the motion", "motion.amplitude"},
	AmplitudeInterest: {"displacement_of_interest", "ξ_i", "displacement against which a static deflection counts", "motion.amplitude"},
	CurvatureLength:   {"curvature_length", "ℓ_κ", "amplitude over largest bending strain", ""},
	LinearStrain:      {"linear_strain", "ε_lin", "strain up to which the material is linear", "structure.linear_strain"},

	Speed:            {"speed", "U", "speed of the flow", "flow.speed"},
	SpeedLow:         {"speed_low", "U_lo", "lowest speed of operation", "flow.operating"},
	SpeedHigh:        {"speed_high", "U_hi", "highest speed of operation", "flow.operating"},
	Incidence:        {"incidence", "α", "steady incidence", "flow.incidence"},
	StallAngle:       {"stall_angle", "α_stall", "stall angle", "structure.stall_angle"},
	Turbulence:       {"turbulence_intensity", "I_u", "turbulence intensity", "flow.turbulence_intensity"},
	DragPerLength:    {"drag", "F_D", "mean load by the flow, in the reference of the dry mass", ""},
	StaticDeflection: {"static_deflection", "δ", "static deflection by the mean flow", ""},

	Density:            {"density", "ρ", "density of the fluid", "fluid.density"},
	Viscosity:          {"viscosity", "η", "dynamic viscosity", "fluid.viscosity"},
	KinematicViscosity: {"kinematic_viscosity", "ν", "kinematic viscosity", "fluid.viscosity"},
	SoundSpeed:         {"sound_speed", "c", "speed of sound", "fluid.sound_speed"},
	VapourPressure:     {"vapour_pressure", "p_v", "vapour pressure", "fluid.vapour_pressure"},
	SurfaceTension:     {"surface_tension", "γ_s", "surface tension", "fluid.surface_tension"},
	HeatCapacityRatio:  {"heat_capacity_ratio", "γ", "ratio of specific heats", "fluid.heat_capacity_ratio"},
	Prandtl:            {"prandtl_number", "Pr", "Prandtl number", "fluid.prandtl_number"},
	Temperature:        {"temperature", "T", "temperature of the fluid", "fluid.temperature"},
	Salinity:           {"salinity", "S", "salinity", "fluid.salinity"},

	Gravity:              {"gravity", "g", "gravity", "surroundings.gravity"},
	AmbientPressure:      {"ambient_pressure", "p_0", "ambient pressure, absolute", "surroundings.ambient_pressure"},
	Pressure:             {"pressure", "p", "absolute pressure at the structure", "fluid.pressure"},
	Gap:                  {"gap", "g", "nearest gap to a wall", "surroundings.wall_gap"},
	WallGap:              {"wall_gap", "g_w", "gap to a plane wall", "surroundings.wall_gap"},
	ShellDiameter:        {"shell_diameter", "D_s", "diameter of the shell", "surroundings.shell_diameter"},
	Depth:                {"depth", "d", "depth below the free surface", "surroundings.depth_below_surface"},
	BackingDepth:         {"backing_depth", "d_c", "depth of the closed cavity", "surroundings.backing_depth"},
	CoincidenceFrequency: {"coincidence_frequency", "f_c", "coincidence frequency", ""},
	Width:                {"width", "b", "width", "structure.width"},
	NextFrequency:        {"next_frequency", "f_2", "frequency of the next mode, dry", "structure.next_frequency"},

	WaveHeight:          {"wave_height", "H", "height of the waves, trough to crest", "waves.height"},
	FrequencyWave:       {"frequency_wave", "f_wave", "frequency of the waves", ""},
	WaterDepth:          {"water_depth", "d", "depth of the water", "waves.depth"},
	WaveLength:          {"wave_length", "λ", "wavelength", ""},
	ParticleSpeed:       {"particle_speed", "u", "speed of the water in the waves, at the surface or at the body", ""},
	WaveLoad:            {"wave_load", "F_w", "amplitude of the wave load at that level, in the reference of the dry mass", ""},
	WaveDeflection:      {"wave_deflection", "δ_w", "amplitude of the deflection by the waves", ""},
	AirGap:              {"air_gap", "a_g", "air gap of the deck, or freeboard of the tank", "waves.air_gap"},
	FrequencyPitch:      {"frequency_pitch", "f_pitch", "natural frequency of pitch", ""},
	FrequencySurge:      {"frequency_surge", "f_surge", "natural frequency of surge on the mooring", ""},
	FrequencySlosh:      {"frequency_slosh", "f_s1", "frequency of the first sloshing mode", ""},
	FrequencySloshThird: {"frequency_slosh_third", "f_s3", "frequency of the third sloshing mode", ""},
	FrequencyExcitation: {"frequency_excitation", "f_exc", "frequency of the excitation", "motion.frequency"},
	BaseAcceleration:    {"base_acceleration", "A", "acceleration that excites the sloshing", "structure.base_acceleration"},
	SloshingHeight:      {"sloshing_height", "η", "wave amplitude at the wall of the tank", ""},

	Breadth:          {"breadth", "B", "length of the section along the flow", "structure.breadth"},
	SheddingWidth:    {"shedding_width", "D_s", "width across the flow of what sheds: the thickness of a blunt trailing edge", "structure.trailing_edge_thickness"},
	InertiaPerLength: {"inertia_per_length", "I_α", "mass moment of inertia per length about the elastic axis", "structure.inertia_per_length"},
	FrequencyTorsion: {"frequency_torsion", "f_α", "natural frequency of torsion, dry and uncoupled", "structure.frequency_torsion"},
	TorsionStiffness: {"torsion_stiffness", "K_α", "torsional stiffness per length of the mode", ""},
	ElasticAxis:      {"elastic_axis", "x_ea", "elastic axis behind the leading edge, in chords", "structure.elastic_axis"},
	CentreOfGravity:  {"centre_of_gravity", "x_cg", "centre of gravity behind the leading edge, in chords", "structure.centre_of_gravity"},
	LiftSlope:        {"lift_slope", "C_Lα", "slope of the lift coefficient per radian, on the chord", "structure.lift_slope"},
	MomentSlope:      {"moment_slope", "C_Mα", "slope of the coefficient of the moment about the elastic axis per radian, on the breadth squared", "structure.moment_slope"},
	Sweep:            {"sweep", "Λ", "sweep of the elastic axis, aft positive", "structure.sweep"},
	DivergenceSpeed:  {"speed_divergence", "U_D", "divergence speed", "structure.divergence_speed"},
	FlutterSpeed:     {"speed_flutter", "U_F", "flutter speed", "structure.flutter_speed"},
	GallopingSpeed:   {"speed_galloping", "U_CG", "onset speed of galloping", ""},
	CriticalSpeed:    {"speed_critical", "U_crit", "speed at which the shedding meets the first mode, f_w D/St", ""},
	TurbulenceLength: {"turbulence_length", "L_u", "length scale of the turbulence along the flow", "flow.turbulence_length"},

	Pitch:            {"pitch", "P", "distance between the axes of neighbouring tubes", "structure.pitch"},
	FreeSpeed:        {"free_speed", "U", "speed of the stream ahead of the tubes", "flow.speed"},
	DuctWidth:        {"duct_width", "W", "width of the duct or shell across the flow and the tubes", "structure.duct_width"},
	GasDensity:       {"gas_density", "ρ_g", "density of the gas of a mixture", "structure.gas_density"},
	NeighbourSpacing: {"neighbour_spacing", "S", "distance to the axis of the neighbour", "surroundings.neighbour_spacing"},
	BodyDiameter:     {"body_diameter", "D", "diameter of the leading body", "structure.leading_body"},
	WaveSpeed:        {"wave_speed", "a", "speed of pressure waves in the tube", ""},
	ColumnFrequency:  {"column_frequency", "f_a", "first acoustic frequency of the fluid column", ""},
	ClosureTime:      {"closure_time", "t_c", "time in which the flow changes", "structure.closure_time"},
	SpeedChange:      {"speed_change", "ΔU", "largest change of the flow speed", "structure.speed_change"},
	ExternalDensity:  {"external_density", "ρ_e", "density of the fluid around the pipe", "structure.external_density"},
	Roughness:        {"roughness", "k_s", "height of the roughness of the bore", "structure.roughness"},
	PulsePressure:    {"pulse_pressure", "Δp", "pulse pressure, highest less lowest", "structure.pulse_pressure"},
	SpeedPeak:        {"speed_peak", "U_p", "peak speed of the pulse", "structure.peak_speed"},
	ColumnLength:     {"column_length", "ℓ_c", "length of the column of fluid", "structure.column_length"},
	ExternalPressure: {"external_pressure", "p_e", "absolute pressure around the vessel", "structure.external_pressure"},

	ElectromechanicalCoupling: {"electromechanical_coupling", "K²", "generalised electromechanical coupling", "active.electromechanical_coupling"},
	Capacitance:               {"capacitance", "C", "capacitance of the piezoelectric part, clamped", "active.capacitance"},
	LoadResistance:            {"load_resistance", "R", "resistance of the load", "active.load_resistance"},
	CoilResistance:            {"coil_resistance", "R_e", "resistance of the moving coil", "active.coil_resistance"},
	ForceFactor:               {"force_factor", "Bl", "force factor of the moving coil", "active.force_factor"},
	ShockPressure:             {"shock_pressure", "P", "peak pressure of the shock", "surroundings.shock_pressure"},
	ShockDecay:                {"shock_decay_time", "θ", "decay time of the shock", "surroundings.shock_decay_time"},
	MaxwellStress:             {"maxwell_stress", "εE²", "Maxwell stress of a dielectric elastomer", "active.maxwell_stress"},
	ShearModulus:              {"shear_modulus", "μ_s", "shear modulus of the elastomer", "active.shear_modulus"},
}
