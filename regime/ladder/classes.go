package ladder

import (
	"slices"

	"regimed/regime/assumption"
	"regimed/regime/group"
)

// Ids that the mechanism asks for by name.
const (
	StaticAeroelastic = "static-aeroelastic"
	lastModalRank     = 3 // classes that give modes without a flow
	lastLumpedRank    = 8 // classes whose fluid inertia is lumped
)

// Groups of assumptions that rows share.
var (
	scales = []*assumption.Entry{assumption.Continuum, assumption.NoCavitation, assumption.NoSurfaceTension}
	small  = []*assumption.Entry{assumption.SmallDisplacement, assumption.SmallStroke, assumption.LinearStructure}
	self   = []*assumption.Entry{assumption.NoLockIn, assumption.NoGalloping, assumption.NoFlutter, assumption.NoFluidelasticInstability, assumption.NoWakeInterference, assumption.NoOvalling}
	static = []*assumption.Entry{assumption.NoDivergence, assumption.NoBucklingByFlow}
	forced = []*assumption.Entry{assumption.NoWaveResonance, assumption.NoSloshingResonance, assumption.NoSlamming, assumption.NoShock, assumption.NoAcousticResonance, assumption.NoPressureSurge}
)

func on(groups ...[]*assumption.Entry) []*assumption.Entry { return slices.Concat(groups...) }

func and(entries ...*assumption.Entry) []*assumption.Entry { return entries }

// Fluid states by what a class can be asked for.
const (
	anyFlow  = group.Cross | group.Axial | group.Grazing | group.Internal
	anyState = group.Still | anyFlow | group.Waves | group.Contained
	still    = group.Still | group.Contained
)

// Classes is the ladder, ordered by rank of cost; among equal ranks the
// earlier row goes first. The last class rests on nothing.
var Classes = []Class{
	{ID: "dry-structure", Title: "Dry structure", Solves: "dry modes, no fluid", Rank: 1,
		Domain:  Domain{States: anyState, Dry: true, Bars: group.Pulsatile},
		RestsOn: on(scales, and(assumption.FluidAbsent, assumption.StillFluid, assumption.SmallDisplacement, assumption.LinearStructure), self, static, forced),
		Axes:    Axes{Fluid: "none", Compressible: "no", Viscous: "no", FreeSurface: "none", Turbulence: "none", Structure: "linear-modal", Coupling: "none", FluidInertia: "none", Phases: "single"}},
	{ID: "added-mass", Title: "Added mass from potential flow", Solves: "modes with the added mass of potential flow", Rank: 2,
		Domain:  Domain{States: anyState, Bars: group.Film | group.Pulsatile},
		RestsOn: on(scales, and(assumption.StillFluid, assumption.InviscidOscillation, assumption.IncompressibleOscillation, assumption.FreeSurfaceAbsent), small, self, static, forced),
		Axes:    Axes{Fluid: "added-mass", Compressible: "no", Viscous: "no", FreeSurface: "none", Turbulence: "none", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	{ID: "viscous-added-mass", Title: "Added mass and damping from viscous flow", Solves: "modes with the added mass and damping of the viscous solution", Rank: 3,
		Domain:  Domain{States: anyState, Bars: group.Film | group.Pulsatile, Needs: group.ViscousSolved},
		RestsOn: on(scales, and(assumption.StillFluid, assumption.IncompressibleOscillation, assumption.FreeSurfaceAbsent), small, self, static, forced),
		Axes:    Axes{Fluid: "viscous-still", Compressible: "no", Viscous: "yes", FreeSurface: "none", Turbulence: "none", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	{ID: "thin-film", Title: "Thin film", Solves: "the Reynolds equation in the gap, with slip, and the modes of the structure", Rank: 3,
		Domain:  Domain{States: group.Still, Needs: group.Film},
		RestsOn: and(assumption.SlipFilm, assumption.Lubrication, assumption.StillFluid, assumption.SmallDisplacement, assumption.LinearStructure),
		Axes:    Axes{Fluid: "film", Viscous: "yes", FreeSurface: "none", Turbulence: "none", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	{ID: "steady-load", Title: "Steady load on the undeformed shape", Solves: "steady flow on the undeformed shape, then the static structure", Rank: 4,
		Domain:  Domain{States: anyFlow, Bars: group.Pulsatile},
		RestsOn: on(scales, and(assumption.OneWay, assumption.RigidStructure, assumption.SteadyFlow, assumption.SmallDisplacement, assumption.LinearStructure), self, static, forced),
		Axes:    Axes{Fluid: "steady", Coupling: "one-way"}},
	{ID: "morison", Title: "Morison's equation", Solves: "kinematics of waves and current, inertia and drag coefficients, the structure with lumped added mass", Rank: 4,
		Domain:  Domain{Kinds: []string{"cylinder", "floater"}, States: group.Waves | group.Cross, Needs: group.Waves},
		RestsOn: on(scales, and(assumption.OneWay, assumption.LongWave, assumption.SmallDisplacement, assumption.NoLockIn, assumption.NoSlamming)),
		Axes:    Axes{Fluid: "quasi-steady", Compressible: "no", Viscous: "yes", Structure: "linear-modal", Coupling: "one-way", Phases: "single"}},
	{ID: "conveying-beam", Title: "Beam in axial flow", Solves: "eigenvalues of a beam with plug flow", Rank: 4,
		Domain:  Domain{Kinds: []string{"cylinder", "flag", "pipe"}, States: group.Axial | group.Internal, Bars: group.StaticOnly | group.Pulsatile},
		RestsOn: on(scales, and(assumption.Slender, assumption.PlugFlow, assumption.IncompressibleFlow), small, and(assumption.NoPressureSurge)),
		Axes:    Axes{Fluid: "one-dimensional", Compressible: "no", Viscous: "no", FreeSurface: "none", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	// The method of characteristics carries vapour cavities, so that cavitation sets
	// the axis of phases and does not rule the class out.
	{ID: "pressure-surge-1d", Title: "One-dimensional pressure surge", Solves: "the column by the method of characteristics with an elastic wall; with the motion of the pipe where Poisson or junction coupling counts", Rank: 4,
		Domain:  Domain{Kinds: []string{"pipe"}, States: group.Internal},
		RestsOn: on(and(assumption.Continuum, assumption.NoSurfaceTension, assumption.OneDimensionalWaves, assumption.SmallDisplacement), self, static),
		Axes:    Axes{Fluid: "one-dimensional", Compressible: "yes", Viscous: "yes", FreeSurface: "none", Structure: "linear-modal", Coupling: "analytic", FluidInertia: "resolved"}},
	{ID: "pulse-wave-1d", Title: "One-dimensional pulse wave", Solves: "pressure and flow along a compliant tube", Rank: 4,
		Domain:  Domain{Kinds: []string{"vessel"}, States: group.Internal, Needs: group.Pulsatile},
		RestsOn: on(scales, and(assumption.LongPulse, assumption.NoBucklingByFlow)),
		Axes:    Axes{Fluid: "one-dimensional", Compressible: "no", Viscous: "yes", FreeSurface: "none", Coupling: "monolithic-or-implicit", FluidInertia: "resolved", Phases: "single"}},
	{ID: "dry-nonlinear-structure", Title: "Dry nonlinear structure", Solves: "the structure with large displacements or a nonlinear material, no fluid", Rank: 4,
		Domain:  Domain{States: anyState, Dry: true, Bars: group.Pulsatile},
		RestsOn: on(scales, and(assumption.FluidAbsent, assumption.StillFluid), self, static, forced),
		Axes:    Axes{Fluid: "none", Compressible: "no", Viscous: "no", FreeSurface: "none", Turbulence: "none", Structure: "nonlinear", Coupling: "none", FluidInertia: "none", Phases: "single"}},
	{ID: "quasi-static-array", Title: "Tube array, quasi-static", Solves: "modes of a tube in its array with the quasi-static threshold of instability, shedding and buffeting by measured coefficients", Rank: 4,
		Domain:  Domain{Kinds: []string{"tube_array"}, States: group.Cross, Bars: group.StaticOnly},
		RestsOn: on(scales, and(assumption.SmallDisplacement, assumption.NoLockIn, assumption.NoAcousticResonance)),
		Axes:    Axes{Fluid: "quasi-steady", Structure: "linear-modal", Coupling: "analytic"}},
	{ID: "sloshing", Title: "Sloshing in a rigid tank", Solves: "a linear free surface in a moving rigid tank, or its mechanical analogue", Rank: 5,
		Domain:  Domain{Kinds: []string{"tank"}, States: group.Still | group.Contained, Needs: group.Sloshing},
		RestsOn: on(scales, and(assumption.LinearFreeSurface, assumption.RigidWalls, assumption.NoSlamming)),
		Axes:    Axes{Fluid: "free-surface", Compressible: "no", Viscous: "no", FreeSurface: "linear", Turbulence: "none", Structure: "rigid", Coupling: "analytic", Phases: "single"}},
	{ID: "diffraction-radiation", Title: "Diffraction and radiation of linear waves", Solves: "linear potential waves and a rigid or modal body", Rank: 5,
		Domain:  Domain{Kinds: []string{"cylinder", "plate", "generic", "floater"}, States: group.Still | group.Waves, Needs: group.NearSurface},
		RestsOn: on(scales, and(assumption.LinearFreeSurface, assumption.InviscidOscillation), small, and(assumption.NoLockIn, assumption.NoSlamming)),
		Axes:    Axes{Fluid: "free-surface", Compressible: "no", Viscous: "no", FreeSurface: "linear", Turbulence: "none", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	{ID: StaticAeroelastic, Title: "Static aeroelasticity", Solves: "steady flow and static structure, iterated", Rank: 5,
		Domain:  Domain{States: group.Cross | group.Grazing | group.Axial},
		RestsOn: on(scales, and(assumption.PseudoStatic, assumption.SteadyFlow, assumption.SmallDisplacement), self, and(assumption.NoStall, assumption.NoAcousticResonance)),
		Axes:    Axes{Fluid: "steady", Coupling: "two-way-implicit"}},
	{ID: "quasi-steady", Title: "Quasi-steady flow", Solves: "steady coefficients that follow the motion", Rank: 5,
		Domain:  Domain{States: group.Cross | group.Grazing, Bars: group.StaticOnly},
		RestsOn: on(scales, and(assumption.QuasiSteady, assumption.SmallDisplacement, assumption.LinearStructure, assumption.NoLockIn, assumption.NoWakeInterference, assumption.NoStall, assumption.NoAcousticResonance)),
		Axes:    Axes{Fluid: "quasi-steady", Structure: "linear-modal", Coupling: "analytic"}},
	{ID: "acoustic-structure", Title: "Acoustic fluid and structure", Solves: "the Helmholtz equation in the fluid and the structure, two-way", Rank: 6,
		Domain:  Domain{States: still, Bars: group.StaticOnly},
		RestsOn: on(scales, and(assumption.StillFluid, assumption.InviscidOscillation, assumption.IsothermalWalls, assumption.FreeSurfaceAbsent), small, self, static),
		Axes:    Axes{Fluid: "acoustic", Compressible: "yes", Viscous: "no", FreeSurface: "none", Turbulence: "none", Structure: "linear-modal", Coupling: "monolithic-or-implicit", Phases: "single"}},
	{ID: "hydroelastic-sloshing", Title: "Sloshing in a flexible tank", Solves: "a linear free surface and flexible walls, two-way", Rank: 6,
		Domain:  Domain{Kinds: []string{"tank"}, States: group.Still | group.Contained, Needs: group.Sloshing},
		RestsOn: on(scales, and(assumption.LinearFreeSurface, assumption.InviscidOscillation), small, and(assumption.NoSlamming)),
		Axes:    Axes{Fluid: "free-surface", Compressible: "no", Viscous: "no", FreeSurface: "linear", Turbulence: "none", Structure: "linear-modal", Coupling: "monolithic-or-implicit", FluidInertia: "resolved", Phases: "single"}},
	{ID: "wake-model", Title: "Wake oscillator", Solves: "structural modes with a wake oscillator", Rank: 6,
		Domain:  Domain{Kinds: []string{"cylinder", "section"}, States: group.Cross, Needs: group.Bluff, Bars: group.StaticOnly},
		RestsOn: on(scales, and(assumption.CalibratedWake, assumption.IncompressibleFlow, assumption.SingleMode, assumption.SmallDisplacement, assumption.NoGalloping, assumption.NoFlutter, assumption.NoDivergence, assumption.NoWakeInterference)),
		Axes:    Axes{Fluid: "wake-model", Compressible: "no", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	{ID: "linear-unsteady", Title: "Linear unsteady flow", Solves: "unsteady potential flow in the frequency domain", Rank: 7,
		Domain:  Domain{Kinds: []string{"plate", "generic", "flag", "wing", "section"}, States: anyFlow &^ group.Internal, Bars: group.StaticOnly},
		RestsOn: on(scales, and(assumption.InviscidFlow, assumption.LinearCompressible), small, and(assumption.NoStall, assumption.NoLockIn)),
		Axes:    Axes{Fluid: "linear-unsteady", Viscous: "no", FreeSurface: "none", Turbulence: "none", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	{ID: "flutter-derivatives", Title: "Flutter derivatives", Solves: "linear self-excited forces from measured or computed derivatives, with the modes of the structure", Rank: 7,
		Domain:  Domain{Kinds: []string{"section"}, States: group.Cross, Bars: group.StaticOnly},
		RestsOn: on(scales, small, and(assumption.NoLockIn, assumption.NoWakeInterference)),
		Axes:    Axes{Fluid: "linear-unsteady", Viscous: "yes", FreeSurface: "none", Structure: "linear-modal", Coupling: "analytic", Phases: "single"}},
	{ID: "thermoviscous-acoustic", Title: "Thermoviscous acoustics", Solves: "the linearised Navier–Stokes equations with heat conduction", Rank: 7,
		Domain:  Domain{States: still, Bars: group.StaticOnly},
		RestsOn: on(scales, and(assumption.StillFluid, assumption.FreeSurfaceAbsent), small, self, static),
		Axes:    Axes{Fluid: "thermoviscous", Compressible: "yes", Viscous: "yes", FreeSurface: "none", Turbulence: "none", Structure: "linear-modal", Coupling: "monolithic-or-implicit", Phases: "single"}},
	{ID: "unsteady-load", Title: "Unsteady load on the rigid shape", Solves: "unsteady flow on the rigid shape, then the dynamic structure with lumped added mass", Rank: 8,
		Domain:  Domain{States: anyFlow | group.Waves | group.Contained},
		RestsOn: and(assumption.OneWay, assumption.RigidStructure, assumption.SmallDisplacement),
		Axes:    Axes{Fluid: "resolved", Coupling: "one-way"}},
	{ID: "two-way-explicit", Title: "Two-way, explicit", Solves: "resolved flow and structure, one exchange a step", Rank: 9,
		Domain:  Domain{States: anyState},
		RestsOn: and(assumption.ExplicitCoupling),
		Axes:    Axes{Fluid: "resolved", Coupling: "two-way-explicit"}},
	{ID: "two-way-implicit", Title: "Two-way, implicit", Solves: "resolved flow and structure, iterated to convergence each step", Rank: 10,
		Domain: Domain{States: anyState, Dry: true},
		Axes:   Axes{Fluid: "resolved", Coupling: "two-way-implicit"}},
}
