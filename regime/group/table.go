package group

// The groups. Append only: ids are a contract.
const (
	MassRatio ID = iota
	ReducedVelocity
	Reynolds
	Stokes
	Compressibility
	Froude

	AddedMassRatio
	AddedMassRatioFree
	MassNumber
	ReducedVelocityWet
	ReducedFrequency
	Strouhal
	SheddingRatio
	Beta
	ViscousDepthRatio
	Mach
	CoincidenceRatio
	DynamicFroude
	LengthReynolds

	FrequencyRatio
	ViscousInertia
	ViscousDamping
	AcousticInertia
	AcousticDamping
	SurfaceInertiaLid
	SurfaceInertiaFree
	FluidStiffness
	FlowStiffness

	DampingRatio
	DampingViscous
	DampingRadiation
	DampingFlow
	DampingTotal

	Displacement
	DisplacementSpan
	DisplacementThickness
	DisplacementGap
	DisplacementDepth
	Slope
	StrainRatio
	KeuleganCarpenter
	DragDamping
	MotionSpeedRatio
	StaticDeflection
	StaticDeflectionInterest
	StaticDeflectionSpan
	StaticDeflectionGap

	Cauchy
	Elastogravity
	Scruton
	SkopGriffin
	MassDamping
	Slenderness
	SpanRatio
	GapRatio
	Knudsen
	Squeeze
	FilmReynolds
	ThermalLayer
	Bond
	Weber
	Cavitation
	SuctionPeak
	OscillationPressure
	FluidLoading
	DragCoefficient
	LiftFluctuation
	ThicknessRatio
	BoundaryLayer
	TurbulenceIntensity
	StallRatio
	PseudoStatic
	NextMode
	ModeCoupling
	AcousticStep

	WakeBandLow
	WakeBandHigh
	LockInPosition
	LockInMode
	LockInNext
	VortexAmplitude
	InlineVelocity
	InlinePosition
	InlineScruton
	GallopingSpeed
	DivergenceSpeed
	FlutterSpeed
	ConveyingSpeed
	ConveyingMass
	BucklingSpeed
	CavityFrequency
	OperatingLow
	OperatingHigh
	LockInEnd

	WaveRatio
	WaveRatioPitch
	WaveRatioSurge
	Diffraction
	DiffractionInertia
	WaveSteepness
	WaveBreaking
	Ursell
	RelativeDepth
	SecondOrder
	DragInertia
	WaveDeflection
	DisplacementWave
	CrestClearance
	SlammingTime
	ConvectiveMass
	ImpulsiveMass
	SloshingRatio
	SloshingRatioThird
	BulgingRatio
	SloshingAmplitude
	FillRatio
	SloshingDamping
	WaveMagnification

	ReducedFrequencyTorsion
	TorsionRatio
	FlutterIndex
	AspectRatio
	GallopingInteraction
	CriticalSpeedRatio
	GustBackground
	GustResonance
	ChordReynolds
	PitchRatio
	ArrayMassDamping
	FluidelasticSpeed
	VoidFraction
	DampingTwoPhase
	DuctResonance
	DuctMode
	NeighbourAlong
	NeighbourAcross
	OvallingSpeed
	OvallingMode
	BodyReynolds

	WallCompliance
	WaveSpeedRatio
	SurgeRatio
	SurgePressure
	SurgeSudden
	ColumnSeparation
	ColumnSeparationSudden
	AxialCoupling
	ColumnFrequency
	ColumnMode
	FrictionLoss
	TransitRatio
	WaveDiameter
	FrontDiameter
	PipeWeight
	PipeCompression
	Womersley
	PulseTransit
	PulseLength
	WallStrain
	ReynoldsPeak
	SpeedIndex
	PulseSpeed
	PulseDecay
	CollapsePressure
	WallMassRatio

	AddedMassSoftest
	Electromechanical
	DampingElectric
	ElectricLoad
	HarvestShare
	QualityFluid

	Taylor
	ShockImpulse
	ShockTension
	ShockPeriod

	PullIn
	SurgeDiameter

	Count // number of groups
)

// Def says what a group is.
type Def struct {
	ID         string
	Symbol     string
	Title      string
	Definition string
	Core       bool   // every answer has it, as a value or as null with the reason
	Bands      []Band // what ranges of its value mean; may be empty
}

// Band names a range of a group: it holds up to the value Below.
type Band struct {
	Below float64
	Name  string
}

// Of returns the definition of a group.
func Of(id ID) *Def { return &table[id] }

// Find returns the group of that name, and whether there is one.
func Find(name string) (ID, bool) {
	for i := range table {
		if table[i].ID == name {
			return ID(i), true
		}
	}
	return 0, false
}

const huge = 1e300

var table = [Count]Def{
	MassRatio: {ID: "mass_ratio", Symbol: "m*", Title: "mass ratio", Core: true,
		Definition: "dry structural mass / mass of the displaced fluid"},
	ReducedVelocity: {ID: "reduced_velocity", Symbol: "U_R", Title: "reduced velocity", Core: true,
		Definition: "U/(f L), f the dry natural frequency, L the flow length"},
	Reynolds: {ID: "reynolds", Symbol: "Re", Title: "Reynolds number", Core: true,
		Definition: "U L/ν, L the flow length; in waves U is the speed of the water with the current"},
	Stokes: {ID: "stokes", Symbol: "S", Title: "Stokes number", Core: true,
		Definition: "ω V²/ν, V the viscous length (radius, semi-width or gap), ω of the motion if forced, else of the wet mode"},
	Compressibility: {ID: "compressibility", Symbol: "He", Title: "Helmholtz number", Core: true,
		Definition: "ω L/c, ω of the motion if forced, else of the wet mode"},
	Froude: {ID: "froude", Symbol: "Fr", Title: "Froude number", Core: true,
		Definition: "U/√(g d), d the depth or draft where there is a free surface"},

	AddedMassRatio: {ID: "added_mass_ratio", Symbol: "μ", Title: "added mass ratio",
		Definition: "ideal added mass, confined as given / dry mass"},
	AddedMassRatioFree: {ID: "added_mass_ratio_free", Symbol: "μ_free", Title: "added mass ratio in unbounded fluid",
		Definition: "ideal added mass without walls / dry mass"},
	MassNumber: {ID: "mass_number", Symbol: "ρ/ρ_s", Title: "mass number",
		Definition: "density of the fluid / density of the solid"},
	ReducedVelocityWet: {ID: "reduced_velocity_wet", Symbol: "V_R", Title: "reduced velocity, wet",
		Definition: "U/(f_w L), f_w the wet natural frequency"},
	ReducedFrequency: {ID: "reduced_frequency", Symbol: "k", Title: "reduced frequency",
		Definition: "ω b/U, b half the length along the flow, ω of the wet mode"},
	Strouhal: {ID: "strouhal", Symbol: "St", Title: "Strouhal number",
		Definition: "f_v L/U, f_v the shedding frequency of the fixed body"},
	SheddingRatio: {ID: "shedding_ratio", Symbol: "f_v/f_w", Title: "shedding frequency ratio",
		Definition: "shedding frequency / wet natural frequency, at the speed given"},
	Beta: {ID: "beta", Symbol: "β", Title: "frequency parameter",
		Definition: "f D²/ν = 2S/π for a cylinder"},
	ViscousDepthRatio: {ID: "viscous_depth_ratio", Symbol: "δ/V", Title: "viscous depth ratio",
		Definition: "√(2ν/ω)/V, V the viscous length"},
	Mach: {ID: "mach", Symbol: "M", Title: "Mach number", Definition: "U/c",
		Bands: []Band{{0.3, "incompressible"}, {0.75, "subsonic"}, {1.25, "transonic"}, {5, "supersonic"}, {huge, "hypersonic"}}},
	CoincidenceRatio: {ID: "coincidence_ratio", Symbol: "f/f_c", Title: "coincidence ratio",
		Definition: "frequency of the motion / coincidence frequency, = (k₀/k_b)² for a free bending wave"},
	DynamicFroude: {ID: "dynamic_froude", Symbol: "ω√(d/g)", Title: "dynamic Froude number",
		Definition: "ω √(d/g), d the depth below the surface",
		Bands:      []Band{{0.223606797749979, "the surface acts as a rigid lid"}, {3.1622776601683795, "the surface makes waves"}, {huge, "the surface is pressure-free"}}},
	LengthReynolds: {ID: "length_reynolds", Symbol: "Re_ℓ", Title: "Reynolds number of the length",
		Definition: "U ℓ/ν, ℓ the length along the flow"},

	FrequencyRatio: {ID: "frequency_ratio", Symbol: "f_w/f", Title: "wet over dry frequency",
		Definition: "1/√(1 + μ Γr), Γr at the wet frequency"},
	ViscousInertia: {ID: "viscous_inertia", Symbol: "Γr", Title: "viscous inertia factor",
		Definition: "added mass of the viscous solution / ideal added mass, at the wet frequency"},
	ViscousDamping: {ID: "viscous_damping", Symbol: "Γi", Title: "viscous damping factor",
		Definition: "damping force of the viscous solution / inertia force of the ideal added mass, at the wet frequency"},
	AcousticInertia: {ID: "acoustic_inertia", Symbol: "Γr,ac", Title: "acoustic inertia factor",
		Definition: "added mass in a compressible fluid / ideal added mass"},
	AcousticDamping: {ID: "acoustic_damping", Symbol: "Γi,ac", Title: "acoustic damping factor",
		Definition: "radiation force / inertia force of the ideal added mass"},
	SurfaceInertiaLid: {ID: "surface_inertia_lid", Symbol: "C_lid", Title: "surface as a rigid lid",
		Definition: "added mass below a rigid lid / added mass in unbounded fluid"},
	SurfaceInertiaFree: {ID: "surface_inertia_free", Symbol: "C_free", Title: "pressure-free surface",
		Definition: "added mass below a pressure-free surface / added mass in unbounded fluid"},
	FluidStiffness: {ID: "fluid_stiffness", Symbol: "k_fluid/k", Title: "fluid stiffness ratio",
		Definition: "stiffness of the film or cavity / structural stiffness of the mode"},
	FlowStiffness: {ID: "flow_stiffness", Symbol: "k_flow/k", Title: "flow stiffness ratio",
		Definition: "magnitude of the flow-induced stiffness / structural stiffness of the mode"},

	DampingRatio: {ID: "damping_ratio", Symbol: "ζ_s", Title: "structural damping ratio, wet",
		Definition: "dry ζ/√(1 + μ Γr): structural damping of the wet oscillator"},
	DampingViscous: {ID: "damping_viscous", Symbol: "ζ_v", Title: "viscous damping ratio",
		Definition: "½ μ Γi/(1 + μ Γr)"},
	DampingRadiation: {ID: "damping_radiation", Symbol: "ζ_rad", Title: "radiation damping ratio",
		Definition: "½ μ Γi,ac/(1 + μ Γr,ac)"},
	DampingFlow: {ID: "damping_flow", Symbol: "ζ_flow", Title: "flow damping ratio",
		Definition: "damping by the mean flow; across a cylinder C_D ρ U D/(4 ω m_w) for motion along the stream"},
	DampingTotal: {ID: "damping_total", Symbol: "ζ", Title: "total damping ratio",
		Definition: "ζ_s + ζ_v + ζ_rad + ζ_flow, in a mixture + ζ_TP"},

	Displacement: {ID: "displacement", Symbol: "ξ/L", Title: "displacement ratio",
		Definition: "amplitude of the motion / flow length"},
	DisplacementSpan: {ID: "displacement_span", Symbol: "ξ/ℓ", Title: "amplitude over span",
		Definition: "amplitude of the motion / length of the structure"},
	DisplacementThickness: {ID: "displacement_thickness", Symbol: "ξ/h", Title: "amplitude over thickness",
		Definition: "amplitude / thickness of the plate, or / radius of gyration of the section of a beam"},
	DisplacementGap: {ID: "displacement_gap", Symbol: "ξ/g", Title: "amplitude over gap",
		Definition: "amplitude / nearest gap to a wall"},
	DisplacementDepth: {ID: "displacement_depth", Symbol: "ξ/d", Title: "amplitude over depth",
		Definition: "amplitude / depth below the free surface"},
	Slope: {ID: "slope", Symbol: "w′", Title: "slope",
		Definition: "largest slope of the mode at the amplitude of the motion"},
	StrainRatio: {ID: "strain_ratio", Symbol: "ε/ε_lin", Title: "strain ratio",
		Definition: "largest bending strain / strain up to which the material is linear"},
	KeuleganCarpenter: {ID: "keulegan_carpenter", Symbol: "KC", Title: "Keulegan–Carpenter number",
		Definition: "2π ξ/D of a motion in still fluid; u T/D in waves, u the speed of the water at the surface or at the body"},
	DragDamping: {ID: "drag_damping", Symbol: "ζ_d", Title: "equivalent damping of quadratic drag",
		Definition: "(2/3π) C_D (ρD²/m_w)(ξ/D)"},
	MotionSpeedRatio: {ID: "motion_speed_ratio", Symbol: "ω ξ/U", Title: "speed of the motion over speed of the flow",
		Definition: "ω ξ/U"},
	StaticDeflection: {ID: "static_deflection", Symbol: "δ/L", Title: "static deflection ratio",
		Definition: "static deflection under the mean flow / flow length"},
	StaticDeflectionInterest: {ID: "static_deflection_interest", Symbol: "δ/ξ", Title: "static deflection over displacement of interest",
		Definition: "static deflection under the mean flow / amplitude of the motion, or / 1 % of the flow length where none is given"},
	StaticDeflectionSpan: {ID: "static_deflection_span", Symbol: "δ/ℓ", Title: "static deflection over span",
		Definition: "static deflection under the mean flow / length of the structure"},
	StaticDeflectionGap: {ID: "static_deflection_gap", Symbol: "δ/g", Title: "static deflection over gap",
		Definition: "static deflection under the mean flow / nearest gap to a wall"},

	Cauchy: {ID: "cauchy", Symbol: "Cy", Title: "Cauchy number",
		Definition: "ρ U²/E"},
	Elastogravity: {ID: "elastogravity", Symbol: "ρgL/E", Title: "elastogravity number",
		Definition: "ρ g L/E"},
	Scruton: {ID: "scruton", Symbol: "Sc", Title: "Scruton number",
		Definition: "4π m ζ/(ρ D²) per length; m dry in gas, with the added mass in liquid; ζ structural"},
	SkopGriffin: {ID: "skop_griffin", Symbol: "S_G", Title: "Skop–Griffin parameter",
		Definition: "2π³ St² α"},
	MassDamping: {ID: "mass_damping", Symbol: "α", Title: "mass-damping parameter",
		Definition: "(m* + C_A) ζ, ζ structural on the wet mass"},
	Slenderness: {ID: "slenderness", Symbol: "D/ℓ", Title: "slenderness",
		Definition: "diameter or width / length"},
	SpanRatio: {ID: "span_ratio", Symbol: "L/ℓ", Title: "flow length over span",
		Definition: "flow length / length across the flow"},
	GapRatio: {ID: "gap_ratio", Symbol: "g/L", Title: "gap ratio",
		Definition: "nearest gap to a wall / flow length"},
	Knudsen: {ID: "knudsen", Symbol: "Kn", Title: "Knudsen number",
		Definition: "√(πγ/2) ν/(c L), L the gap, the width or the diameter",
		Bands:      []Band{{0.01, "continuum"}, {0.1, "slip"}, {10, "transitional"}, {huge, "free molecular"}}},
	Squeeze: {ID: "squeeze", Symbol: "σ", Title: "squeeze number",
		Definition: "12 η ω L²/(p g²), L the width, η corrected for rarefaction"},
	FilmReynolds: {ID: "film_reynolds", Symbol: "ωg²/ν", Title: "film Reynolds number",
		Definition: "ω g²/ν"},
	ThermalLayer: {ID: "thermal_layer", Symbol: "(γ−1)δ_t/g", Title: "thermal layer over gap",
		Definition: "(γ − 1) √(2ν/(ω Pr))/g"},
	Bond: {ID: "bond", Symbol: "Bo", Title: "Bond number",
		Definition: "ρ g L²/γ_s"},
	Weber: {ID: "weber", Symbol: "We", Title: "Weber number",
		Definition: "ρ U² L/γ_s"},
	Cavitation: {ID: "cavitation", Symbol: "σ_c", Title: "cavitation number",
		Definition: "(p − p_v)/(½ρU²), p absolute, at the highest speed of operation"},
	SuctionPeak: {ID: "suction_peak", Symbol: "−Cp_min", Title: "suction peak",
		Definition: "largest suction on the body / dynamic pressure"},
	OscillationPressure: {ID: "oscillation_pressure", Symbol: "ρω²ξL/(p−p_v)", Title: "pressure of the oscillation",
		Definition: "ρ ω² ξ L/(p − p_v)"},
	FluidLoading: {ID: "fluid_loading", Symbol: "ε_f", Title: "fluid loading",
		Definition: "ρ c/(m″ ω_c), ω_c the coincidence frequency"},
	DragCoefficient: {ID: "drag_coefficient", Symbol: "C_D", Title: "drag coefficient",
		Definition: "mean drag / (½ρU² × frontal area)"},
	LiftFluctuation: {ID: "lift_fluctuation", Symbol: "C_L′", Title: "unsteady lift coefficient",
		Definition: "r.m.s. lift / (½ρU² × frontal area)"},
	ThicknessRatio: {ID: "thickness_ratio", Symbol: "τ", Title: "relative thickness",
		Definition: "thickness / length along the flow"},
	BoundaryLayer: {ID: "boundary_layer", Symbol: "δ*", Title: "displacement thickness ratio",
		Definition: "displacement thickness of the boundary layers / thickness of the body; for a flush panel × k_b"},
	TurbulenceIntensity: {ID: "turbulence_intensity", Symbol: "I_u", Title: "turbulence intensity",
		Definition: "r.m.s. of the speed / mean speed"},
	StallRatio: {ID: "stall_ratio", Symbol: "α/α_stall", Title: "incidence ratio",
		Definition: "steady incidence / stall angle"},
	PseudoStatic: {ID: "pseudo_static", Symbol: "c_flow ω/k_flow", Title: "flow damping over flow stiffness",
		Definition: "flow damping force / flow stiffness force, at the wet frequency"},
	NextMode: {ID: "next_mode", Symbol: "f₂/f₁", Title: "next mode",
		Definition: "frequency of the next mode that the fluid can couple / frequency of this mode"},
	ModeCoupling: {ID: "mode_coupling", Symbol: "m₁₂/m₁₁", Title: "modal coupling",
		Definition: "off-diagonal share of the added mass (upper bound 1)"},
	AcousticStep: {ID: "acoustic_step", Symbol: "ρcΔt/m″", Title: "added mass of one acoustic step",
		Definition: "ρ c Δt/m″ with Δt a twentieth of the wet period, m″ the mass per wetted area"},

	WakeBandLow: {ID: "wake_band_low", Symbol: "x_lo", Title: "lower edge of the wake band",
		Definition: "1/(1 + √(A M)), of St U/(f_w D)"},
	WakeBandHigh: {ID: "wake_band_high", Symbol: "x_hi", Title: "upper edge of the wake band",
		Definition: "1/(1 − √(A M)), of St U/(f_w D); none for A M ≥ 1"},
	LockInPosition: {ID: "lock_in_position", Symbol: "x", Title: "position in the wake band",
		Definition: "St U/(f_w D) at the worst speed of operation and for the worst mode"},
	LockInMode: {ID: "lock_in_mode", Symbol: "n", Title: "mode nearest to the wake band",
		Definition: "number of the mode that is nearest to lock-in across the flow"},
	LockInNext: {ID: "lock_in_next", Symbol: "u₂", Title: "second mode in the wake band",
		Definition: "position of the next nearest mode in its band: 1 at an edge, above 1 inside"},
	VortexAmplitude: {ID: "vortex_amplitude", Symbol: "A/D", Title: "amplitude of vortex-induced vibration",
		Definition: "the larger of the published estimates for the locked-in amplitude / diameter"},
	InlineVelocity: {ID: "inline_velocity", Symbol: "V_R", Title: "reduced velocity for in-line lock-in",
		Definition: "U/(f_w D) at the worst speed of operation and for the worst mode"},
	InlinePosition: {ID: "inline_position", Symbol: "u_il", Title: "position in the in-line band",
		Definition: "min(V_R/1, 4.5/V_R) at the worst speed and mode"},
	InlineScruton: {ID: "inline_scruton", Symbol: "1.8/Sc", Title: "in-line suppression by damping",
		Definition: "1.8/Sc"},
	GallopingSpeed: {ID: "galloping_speed", Symbol: "U/U_CG", Title: "galloping speed ratio",
		Definition: "highest speed of operation / onset speed of galloping"},
	DivergenceSpeed: {ID: "divergence_speed", Symbol: "U/U_D", Title: "divergence speed ratio",
		Definition: "highest speed of operation / divergence speed"},
	FlutterSpeed: {ID: "flutter_speed", Symbol: "U/U_F", Title: "flutter speed ratio",
		Definition: "highest speed of operation / flutter speed"},
	ConveyingSpeed: {ID: "conveying_speed", Symbol: "u", Title: "dimensionless flow speed",
		Definition: "U ℓ √(m_a/(E I)), m_a the added mass per length in axial flow"},
	ConveyingMass: {ID: "conveying_mass", Symbol: "β_c", Title: "mass share of the fluid",
		Definition: "m_a/(m_a + m), per length"},
	BucklingSpeed: {ID: "buckling_speed", Symbol: "U/U_B", Title: "buckling speed ratio",
		Definition: "highest speed of operation / speed of buckling by flow"},
	CavityFrequency: {ID: "cavity_frequency", Symbol: "f_w/f_a", Title: "cavity resonance ratio",
		Definition: "wet natural frequency / first acoustic frequency of the cavity c/(2d)"},
	OperatingLow: {ID: "operating_low", Symbol: "U_lo/U", Title: "lowest speed of operation",
		Definition: "lowest speed in service / speed of the flow"},
	OperatingHigh: {ID: "operating_high", Symbol: "U_hi/U", Title: "highest speed of operation",
		Definition: "highest speed in service / speed of the flow"},
	LockInEnd: {ID: "lock_in_end", Symbol: "x_end", Title: "end of measured lock-in",
		Definition: "St U/(f_w D) at the end of the lower branch, St 9.25 √((m* + C_A)/(m* − 0.54)), at least the upper edge of the wake band"},

	WaveRatio: {ID: "wave_frequency_ratio", Symbol: "f_wave/f_w", Title: "wave frequency ratio",
		Definition: "frequency of the waves / wet natural frequency"},
	WaveRatioPitch: {ID: "wave_frequency_ratio_pitch", Symbol: "f_wave/f_pitch", Title: "wave frequency over pitch frequency",
		Definition: "frequency of the waves / natural frequency of pitch"},
	WaveRatioSurge: {ID: "wave_frequency_ratio_surge", Symbol: "f_wave/f_surge", Title: "wave frequency over surge frequency",
		Definition: "frequency of the waves / natural frequency of surge on the mooring"},
	Diffraction: {ID: "diffraction", Symbol: "D/λ", Title: "diffraction parameter",
		Definition: "length of the body along the waves / wavelength",
		Bands:      []Band{{0.2, "the wave passes as if the body were not there"}, {huge, "the body diffracts the wave"}}},
	DiffractionInertia: {ID: "diffraction_inertia", Symbol: "C_M/2", Title: "inertia by diffraction",
		Definition: "inertia coefficient of a vertical cylinder that diffracts the wave / 2 of a thin one"},
	WaveSteepness: {ID: "wave_steepness", Symbol: "H/λ", Title: "wave steepness",
		Definition: "wave height / wavelength"},
	WaveBreaking: {ID: "wave_breaking", Symbol: "H/H_b", Title: "height over breaking height",
		Definition: "wave height / (0.142 λ tanh kd)"},
	Ursell: {ID: "ursell", Symbol: "Ur", Title: "Ursell number",
		Definition: "H λ²/d³, d the depth of the water",
		Bands:      []Band{{26, "second-order theory holds"}, {huge, "shallow: a cnoidal wave"}}},
	RelativeDepth: {ID: "relative_depth", Symbol: "d/λ", Title: "relative depth",
		Definition: "depth of the water / wavelength",
		Bands:      []Band{{0.05, "shallow water"}, {0.5, "intermediate depth"}, {huge, "deep water"}}},
	SecondOrder: {ID: "second_order", Symbol: "a₂/a", Title: "second-order wave",
		Definition: "second harmonic of the elevation / first harmonic"},
	DragInertia: {ID: "drag_inertia", Symbol: "F_D/F_I", Title: "drag over inertia force",
		Definition: "amplitude of the drag / amplitude of the inertia force in waves, C_D KC/(π² C_M) for a circular cylinder without current",
		Bands:      []Band{{0.5, "inertia dominated"}, {2, "drag and inertia"}, {huge, "drag dominated"}}},
	WaveDeflection: {ID: "wave_deflection", Symbol: "δ_w/ξ", Title: "deflection by waves over displacement of interest",
		Definition: "amplitude of the deflection by the waves / amplitude of the motion, or / 1 % of the flow length where none is given"},
	DisplacementWave: {ID: "displacement_wave", Symbol: "kξ", Title: "amplitude over wavelength",
		Definition: "2π × amplitude of the motion / wavelength"},
	CrestClearance: {ID: "crest_clearance", Symbol: "η/a_g", Title: "crest over clearance",
		Definition: "elevation of the crest / air gap of the deck, or freeboard of the tank"},
	SlammingTime: {ID: "slamming_time", Symbol: "t_s f_w", Title: "loading time over wet period",
		Definition: "duration of a slamming load, 13 D/(64 v), v the speed of impact, / wet period",
		Bands:      []Band{{0.25, "impulsive"}, {4, "dynamic"}, {huge, "quasi-static"}}},
	ConvectiveMass: {ID: "convective_mass", Symbol: "m_1/m", Title: "convective mass share",
		Definition: "mass that moves with the first sloshing mode / mass of the liquid"},
	ImpulsiveMass: {ID: "impulsive_mass", Symbol: "m_0/m", Title: "impulsive mass share",
		Definition: "mass that moves with the tank, 1 − Σ of the sloshing masses / mass of the liquid"},
	SloshingRatio: {ID: "sloshing_ratio", Symbol: "f/f_s1", Title: "excitation over first sloshing frequency",
		Definition: "frequency of the excitation / frequency of the first sloshing mode"},
	SloshingRatioThird: {ID: "sloshing_ratio_third", Symbol: "f/f_s3", Title: "excitation over third sloshing frequency",
		Definition: "frequency of the excitation / frequency of the third sloshing mode"},
	BulgingRatio: {ID: "bulging_ratio", Symbol: "f_s1/f_b", Title: "sloshing over bulging frequency",
		Definition: "frequency of the first sloshing mode / frequency of the wall with liquid"},
	SloshingAmplitude: {ID: "sloshing_amplitude", Symbol: "η/η_lin", Title: "sloshing amplitude",
		Definition: "wave amplitude at the wall / min(0.1 h, 0.05 L), h the liquid depth, L the length along the motion or the diameter"},
	FillRatio: {ID: "fill_ratio", Symbol: "h/L", Title: "fill ratio",
		Definition: "liquid depth / length along the motion or diameter",
		Bands:      []Band{{0.337, "shallow: resonance hardens, bores travel"}, {huge, "deep: resonance softens"}}},
	SloshingDamping: {ID: "sloshing_damping", Symbol: "ζ_slosh", Title: "sloshing damping ratio",
		Definition: "damping ratio of the first sloshing mode by the Stokes layers on walls and bottom"},
	WaveMagnification: {ID: "wave_magnification", Symbol: "DAF", Title: "dynamic magnification in waves",
		Definition: "1/√((1 − r²)² + (2ζr)²), r = f_wave/f_w"},

	ReducedFrequencyTorsion: {ID: "reduced_frequency_torsion", Symbol: "k_α", Title: "reduced frequency of torsion",
		Definition: "2π f_α b/U, f_α the dry frequency of torsion, b half the length along the flow"},
	TorsionRatio: {ID: "torsion_ratio", Symbol: "f_α/f", Title: "torsion over bending frequency",
		Definition: "dry frequency of torsion / dry frequency of bending"},
	FlutterIndex: {ID: "flutter_speed_index", Symbol: "V_F", Title: "flutter speed index",
		Definition: "U/(b ω_α √μ_s), μ_s = m/(πρb²), b half the length along the flow"},
	AspectRatio: {ID: "aspect_ratio", Symbol: "A", Title: "aspect ratio",
		Definition: "span between the free tips / chord; a wing that ends at a wall counts with its mirror image"},
	GallopingInteraction: {ID: "galloping_interaction", Symbol: "U_CG/U_crit", Title: "galloping over critical speed",
		Definition: "onset speed of galloping / speed at which shedding meets the first mode"},
	CriticalSpeedRatio: {ID: "critical_speed_ratio", Symbol: "U/U_crit", Title: "critical speed ratio",
		Definition: "highest speed of operation / speed at which shedding meets the first mode, f_w D/St"},
	GustBackground: {ID: "gust_background", Symbol: "B²", Title: "background response to gusts",
		Definition: "1/(1 + 0.9((b + ℓ)/L_u)^0.63), b the width across the wind, ℓ the length, L_u the length scale of the turbulence"},
	ChordReynolds: {ID: "chord_reynolds", Symbol: "Re_B", Title: "Reynolds number of the breadth",
		Definition: "U B/ν, B the length of the section along the flow"},
	GustResonance: {ID: "gust_resonance", Symbol: "S_L R_ℓ R_b", Title: "gust energy at the mode",
		Definition: "n S_u(n)/σ_u² at the natural frequency, times the size reductions over the length and the width"},
	PitchRatio: {ID: "pitch_ratio", Symbol: "P/D", Title: "pitch ratio",
		Definition: "distance between the axes of neighbouring tubes / diameter"},
	ArrayMassDamping: {ID: "array_mass_damping", Symbol: "2πζm/(ρD²)", Title: "mass-damping of a tube array",
		Definition: "2π ζ m/(ρ D²), ζ and m (tube, contents and added mass) in the fluid at rest"},
	FluidelasticSpeed: {ID: "fluidelastic_speed", Symbol: "V_p/V_c", Title: "fluidelastic speed ratio",
		Definition: "highest speed in the gaps in operation / K f_w D √(2π ζ m/(ρD²)), K = 3"},
	VoidFraction: {ID: "void_fraction", Symbol: "ε_g", Title: "void fraction",
		Definition: "volume of the gas / volume of the mixture"},
	DampingTwoPhase: {ID: "damping_two_phase", Symbol: "ζ_TP", Title: "two-phase damping ratio",
		Definition: "0.04 (ρ_ℓD²/m) f(ε_g) (1 + (D/D_e)³)/(1 − (D/D_e)²)²"},
	DuctResonance: {ID: "duct_resonance", Symbol: "f_v/f_a", Title: "shedding over acoustic frequency",
		Definition: "shedding frequency / n c_e/(2W), c_e = c/√(1 + σ), σ the solidity, at the worst speed of operation and for the worst mode"},
	DuctMode: {ID: "duct_mode", Symbol: "n", Title: "acoustic mode across the duct",
		Definition: "number of half waves of the acoustic mode nearest to the shedding frequency"},
	NeighbourAlong: {ID: "neighbour_along", Symbol: "S_x/D", Title: "distance of the neighbour along the flow",
		Definition: "distance of the axes along the flow / diameter"},
	NeighbourAcross: {ID: "neighbour_across", Symbol: "S_y/D", Title: "distance of the neighbour across the flow",
		Definition: "distance of the axes across the flow / diameter"},
	OvallingSpeed: {ID: "ovalling_speed", Symbol: "U/U_ov", Title: "ovalling speed ratio",
		Definition: "highest speed of operation / f_n D/(2 St), f_n the lowest shell mode of n ≥ 2 waves around"},
	OvallingMode: {ID: "ovalling_mode", Symbol: "n", Title: "ovalling mode",
		Definition: "waves around the circumference of the lowest shell mode"},
	BodyReynolds: {ID: "body_reynolds", Symbol: "Re_D", Title: "Reynolds number of the leading body",
		Definition: "U D/ν, D the diameter of the body that holds the structure"},
	WallCompliance: {ID: "wall_compliance", Symbol: "ψ", Title: "compliance of the wall",
		Definition: "c₁ K D/(E e): compliance of the wall of a tube / compressibility of the fluid in it, c₁ by anchoring"},
	WaveSpeedRatio: {ID: "wave_speed_ratio", Symbol: "a/c", Title: "pressure wave speed ratio",
		Definition: "1/√(1 + ψ): speed of pressure waves in the elastic tube / speed of sound"},
	SurgeRatio: {ID: "surge_ratio", Symbol: "t_c a/(2ℓ)", Title: "closure time ratio",
		Definition: "time of the change of the flow / return time 2ℓ_c/a of the pressure wave",
		Bands:      []Band{{1, "sudden"}, {10, "slow for the wave"}, {huge, "rigid column"}}},
	SurgePressure: {ID: "surge_pressure", Symbol: "Δp/p", Title: "surge pressure ratio",
		Definition: "ρ a ΔU min(1, (2ℓ/a)/t_c) / gauge pressure inside"},
	SurgeSudden: {ID: "surge_sudden", Symbol: "ρaΔU/p", Title: "surge pressure ratio of a sudden change",
		Definition: "ρ a ΔU / gauge pressure inside"},
	ColumnSeparation: {ID: "column_separation", Symbol: "Δp/(p−p_v)", Title: "surge over what parts the liquid from vapour",
		Definition: "surge pressure / (absolute pressure − vapour pressure)"},
	ColumnSeparationSudden: {ID: "column_separation_sudden", Symbol: "ρaΔU/(p−p_v)", Title: "sudden surge over what parts the liquid from vapour",
		Definition: "ρ a ΔU / (absolute pressure − vapour pressure)"},
	AxialCoupling: {ID: "axial_coupling", Symbol: "κa²/(c_s²−a²)", Title: "Poisson coupling of wall and fluid",
		Definition: "κ a²/(c_s² − a²), κ = 4ν² m_f/m_p, c_s = √(E/ρ_s) the bar speed of the wall"},
	ColumnFrequency: {ID: "column_frequency", Symbol: "f_w/f_a", Title: "column resonance ratio",
		Definition: "wet natural frequency / nearest of the first three acoustic frequencies of the fluid column"},
	ColumnMode: {ID: "column_mode", Symbol: "j", Title: "acoustic mode of the column",
		Definition: "number of the acoustic mode of the fluid column that is nearest to the wet frequency"},
	FrictionLoss: {ID: "friction_loss", Symbol: "fℓ/D", Title: "friction loss",
		Definition: "Darcy friction factor × length of the column / inner diameter: pressure drop / (½ρU²)"},
	TransitRatio: {ID: "transit_ratio", Symbol: "f_w ℓ/U", Title: "transit time over period",
		Definition: "time that the flow takes through the tube / period of the motion"},
	WaveDiameter: {ID: "wave_diameter", Symbol: "f D/a", Title: "diameter over pressure wavelength",
		Definition: "wet natural frequency × inner diameter / pressure wave speed"},
	FrontDiameter: {ID: "front_diameter", Symbol: "D/(π a t_c)", Title: "diameter over length of the wave front",
		Definition: "inner diameter / (π × pressure wave speed × closure time); nothing rests on it"},
	SurgeDiameter: {ID: "surge_diameter", Symbol: "D/(4ℓ_c + 2a t_c)", Title: "diameter over length of the surge",
		Definition: "inner diameter / (4 × length of the column + 2 × pressure wave speed × closure time)"},
	PipeWeight: {ID: "pipe_weight", Symbol: "γ_w", Title: "weight over bending stiffness",
		Definition: "(m + m_f − m_displaced) g ℓ³ sin(inclination)/(E I), positive where the downstream end hangs lower"},
	PipeCompression: {ID: "pipe_compression", Symbol: "Π", Title: "axial compression over bending stiffness",
		Definition: "((1 − 2ν) p A − T) ℓ²/(E I), p the gauge pressure inside, ends held along the axis"},
	Womersley: {ID: "womersley", Symbol: "α", Title: "Womersley number",
		Definition: "R √(ω/ν), R the inner radius, ω of the pulse",
		Bands:      []Band{{1, "quasi-steady profile"}, {10, "viscous and inertial forces comparable"}, {huge, "thin boundary layer"}}},
	PulseTransit: {ID: "pulse_transit", Symbol: "f ℓ/c", Title: "pulse transit over period",
		Definition: "time that the pulse wave takes through the segment / period of the pulse"},
	PulseLength: {ID: "pulse_length", Symbol: "R f/c", Title: "radius over pulse wavelength",
		Definition: "inner radius × pulse frequency / pulse wave speed"},
	WallStrain: {ID: "wall_strain", Symbol: "ε_θ", Title: "hoop strain of the pulse",
		Definition: "Δp R/(E h), Δp the pulse pressure"},
	ReynoldsPeak: {ID: "reynolds_peak", Symbol: "Re_peak", Title: "peak Reynolds number",
		Definition: "peak speed × diameter / ν"},
	SpeedIndex: {ID: "speed_index", Symbol: "U/c", Title: "speed index",
		Definition: "highest speed of the flow / pulse wave speed",
		Bands:      []Band{{1, "subcritical"}, {huge, "supercritical"}}},
	PulseSpeed: {ID: "pulse_speed", Symbol: "c/c₀", Title: "viscous over inviscid pulse wave speed",
		Definition: "phase speed by the profile of the Womersley number / Moens–Korteweg speed"},
	PulseDecay: {ID: "pulse_decay", Symbol: "e^{−2πκ}", Title: "pulse left after one wavelength",
		Definition: "amplitude of the pulse wave after one wavelength / before, by viscosity"},
	CollapsePressure: {ID: "collapse_pressure", Symbol: "(p_e − p)/p_cr", Title: "collapse pressure ratio",
		Definition: "external pressure above the lowest internal one / pressure under which the tube buckles into lobes"},
	WallMassRatio: {ID: "wall_mass_ratio", Symbol: "ρ_s h/(ρR)", Title: "wall mass ratio",
		Definition: "mass per area of the wall / (density of the fluid × radius)"},
	AddedMassSoftest: {ID: "added_mass_ratio_softest", Symbol: "μ_max", Title: "largest added mass ratio",
		Definition: "added mass / dry mass of that motion of a free body in which it is largest"},
	Electromechanical: {ID: "electromechanical", Symbol: "K²", Title: "generalised electromechanical coupling",
		Definition: "(open-circuit / short-circuit frequency)² − 1 = k²/(1 − k²)"},
	DampingElectric: {ID: "damping_electric", Symbol: "ζ_e", Title: "damping ratio of the circuit",
		Definition: "(Bl)²/(2 R m_w ω_w) of a moving coil; ½ K² r/(1 + (1 + K²) r²), r = ωRC, of a resistor on a piezoelectric part"},
	ElectricLoad: {ID: "electric_load", Symbol: "ωRC", Title: "electric load",
		Definition: "ω_w × load resistance × capacitance; matched at 1/√(1 + K²)"},
	HarvestShare: {ID: "harvest_share", Symbol: "4πζ_m", Title: "energy that a matched load takes in a cycle",
		Definition: "4πζ_m, ζ_m the damping ratio of a matched load: × ½ m_w ω² ξ² f is the power that can be harvested, in order of magnitude"},
	QualityFluid: {ID: "quality_fluid", Symbol: "Q_f", Title: "quality factor by the fluid alone",
		Definition: "1/(2(ζ_v + ζ_rad)) at the wet frequency"},
	Taylor: {ID: "taylor_parameter", Symbol: "ψ", Title: "Taylor's parameter",
		Definition: "ρ c θ/m″, θ the decay time of the shock, m″ the mass per area of the plate"},
	ShockImpulse: {ID: "shock_impulse", Symbol: "I/2Pθ", Title: "share of the shock's impulse",
		Definition: "impulse that the plate takes until the liquid lets go / impulse on a rigid wall 2Pθ, ψ^(ψ/(1 − ψ))"},
	ShockTension: {ID: "shock_tension", Symbol: "p_t/(p − p_v)", Title: "tension of the reflected shock",
		Definition: "largest tension at the face of the plate / (p − p_v)"},
	ShockPeriod: {ID: "shock_period", Symbol: "θ f_w", Title: "decay time over wet period",
		Definition: "decay time of the shock / wet period"},
	PullIn: {ID: "pull_in", Symbol: "E/E_c", Title: "pull-in ratio",
		Definition: "field of a dielectric elastomer / field at which its membrane pulls itself in, √(εE²/(0.4725 μ))"},
}
