package assumption_test

import (
	"fmt"
	"math"
	"math/cmplx"
	"testing"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// answer classifies a case that must be right.
func answer(t *testing.T, text string) *regime.Answer {
	t.Helper()
	c, bad, err := input.Decode([]byte(text), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatalf("%v %v\n%s", err, bad, text)
	}
	a, bad := regime.Classify(c)
	if len(bad) > 0 {
		t.Fatalf("%v\n%s", bad, text)
	}
	return a
}

// Fluids with round numbers.
const (
	liquid = `"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","sound_speed":"1500 m/s","vapour_pressure":"2000 Pa","surface_tension":"0.07 N/m","pressure":"102 kPa","phase":"liquid"}`
	gas    = `"fluid":{"density":"1.2 kg/m3","kinematic_viscosity":"1.5e-5 m2/s","sound_speed":"300 m/s","heat_capacity_ratio":1.4,"prandtl_number":0.7,"phase":"gas"}`
	// dense is a gas as heavy as water: what liquids have besides is absent.
	dense = `"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","sound_speed":"1500 m/s","phase":"gas"}`
)

// Structures with round numbers. The rod displaces πD²/4 = 7.854e-3 m² and has
// twice the mass of the fluid displaced in water; the ball is of water's density
// times four.
const (
	rod   = `"structure":{"kind":"cylinder","diameter":"0.1 m","mass_per_length":"15.70796326794897 kg/m","support":"spring-mounted","frequency_wet":"1 Hz","strouhal":0.2,"damping_ratio":`
	ball  = `"structure":{"kind":"generic","shape":"sphere","length":"20 mm","density":"4000 kg/m3","frequency_wet":`
	foil  = `"structure":{"kind":"generic","shape":"streamlined","length":"0.1 m","thickness":"10 mm","volume":"1 L","mass":"4 kg","frequency_dry":"10 Hz","stall_angle":"0.2 rad"}`
	panel = `"structure":{"kind":"plate","length":"1 m","width":"1 m","thickness":"10 mm","density":"7850 kg/m3","young_modulus":"210 GPa","poisson_ratio":0.3,"edges":"SSSS","wetted_sides":1}`
	beam  = `"structure":{"kind":"cylinder","diameter":"20 mm","length":"1 m","density":"7850 kg/m3","young_modulus":"210 GPa","linear_strain":0.002,"support":`
)

// A diaphragm of 0.1 m on 1000 N/m in gas before a box of 20 L, and the stiffness
// of the box over that of the suspension.
const box = `{"structure":{"kind":"piston","radius":"0.1 m","moving_mass":"1 kg","stiffness":"1 kN/m","enclosure_volume":"20 L"},` + gas + `}`

var boxStiffness = 1.2 * 300 * 300 * math.Pow(math.Pi*0.01, 2) / 0.02 / 1000

// Bending stiffness and speed of divergence of the panel above.
var (
	panelStiffness = 210e9 * 1e-6 / (12 * (1 - 0.09))
	// divergence of the panel between standing waves: ρU²α²/k_b = D k_b⁴ at
	// α = π, k_b = √2 π, times √(1 − M²)
	panelDivergence = math.Sqrt(panelStiffness * math.Pow(math.Sqrt2*math.Pi, 5) / (1000 * math.Pi * math.Pi))
)

// panelAddedMass is μ̂ρa/(ρ_s h) of the panel's mode (1,1) in water, one side, μ̂ =
// 0.40950 by Rayleigh's integral.
const panelAddedMass = 0.40950 * 1000 / 78.5

// inertiaError is the error of a wet frequency with the added mass μ in place of μΓ.
func inertiaError(mu, gamma float64) float64 { return math.Abs(math.Sqrt((1+mu*gamma)/(1+mu)) - 1) }

// theodorsen is C(k) by the Hankel functions, written out.
func theodorsen(k float64) complex128 {
	h0 := complex(math.J0(k), -math.Y0(k))
	h1 := complex(math.J1(k), -math.Y1(k))
	return h1 / (h1 + 1i*h0)
}

// bandOfRod are the edges of lock-in of the rod: 1/(1 + √(AM)), AM = A C_L0/(16π²St²μ′)
// with μ′ = (m + m_a)/(ρD²) = 3π/4; and the end of the lower branch, 9.25 St √(3/1.46).
func bandOfRod() (lo, end float64) {
	am := 12 * 0.3 / (16 * math.Pi * math.Pi * 0.04 * 3 * math.Pi / 4)
	return 1 / (1 + math.Sqrt(am)), 9.25 * 0.2 * math.Sqrt(3/1.46)
}

type known struct {
	entry   *assumption.Entry
	name    string
	text    string
	measure finding.Measure
	want    float64 // estimate, worked by hand
	tol     float64 // relative
	limit   float64 // that it is held against
	verdict finding.Verdict
}

// knownGroup is a known answer of an assumption whose groups are put directly.
type knownGroup struct {
	known
	traits group.Traits
	values map[group.ID]float64
}

func knownOfGroups() []knownGroup {
	of := func(e *assumption.Entry, name string, m finding.Measure, want, limit float64, v finding.Verdict) known {
		return known{entry: e, name: name, measure: m, want: want, tol: 1e-12, limit: limit, verdict: v}
	}
	type of1 = map[group.ID]float64
	water := group.Fluid | group.Liquid
	waves, tank, column := water|group.Waves, water|group.Contained|group.Sloshing, water|group.Internal|group.Column
	wind, beside := group.Fluid|group.Gas|group.Cross, water|group.Cross|group.Neighboured
	resonant := math.Sqrt(0.5 + math.Pi/4*0.02/0.01) // √(B² + R²)
	return []knownGroup{
		{of(assumption.PassiveStructure, "K² ¼ in open circuit", finding.Frequency, math.Sqrt(1.25)-1, 0.05, finding.Invalid), group.Active, of1{group.Electromechanical: 0.25}},
		{of(assumption.PassiveStructure, "K² of a thin patch", finding.Frequency, math.Sqrt(1.01)-1, 0.05, finding.Valid), group.Active, of1{group.Electromechanical: 0.01}},
		{of(assumption.NoPullIn, "half the field of pull-in", finding.Stability, 0.5, 1, finding.Valid), group.Dielectric, of1{group.PullIn: 0.5}},
		{of(assumption.NoPullIn, "twice the field of pull-in", finding.Stability, 2, 1, finding.Invalid), group.Dielectric, of1{group.PullIn: 2}},
		{of(assumption.NoWaveResonance, "half way to the band", finding.Stability, 0.5, 1, finding.Valid), waves, of1{group.WaveRatio: 0.4}},
		{of(assumption.NoWaveResonance, "resonance", finding.Stability, 1.25, 1, finding.Invalid), waves, of1{group.WaveRatio: 1}},
		{of(assumption.NoSloshingResonance, "twice the band", finding.Stability, 0.5, 1, finding.Valid), tank, of1{group.SloshingRatio: 2.5}},
		{of(assumption.NoSlamming, "crest at nine tenths of the gap", finding.Stability, 0.9, 1, finding.Marginal), waves, of1{group.CrestClearance: 0.9}},
		{of(assumption.NoShock, "half of what parts the liquid", finding.Stability, 0.5, 1, finding.Valid), water | group.Shock, of1{group.ShockTension: 0.5}},
		{of(assumption.LongWave, "D/λ 0.05 against 0.2", finding.Scale, 0.05, 0.2, finding.Valid), waves, of1{group.Diffraction: 0.05}},
		{of(assumption.RigidWalls, "½(f_s/f_b)²", finding.Frequency, 0.02, 0.05, finding.Valid), tank, of1{group.BulgingRatio: 0.2}},
		{of(assumption.NoPressureSurge, "half of a tenth of the pressure", finding.Stability, 0.05, 0.1, finding.Valid), column, of1{group.SurgePressure: 0.05}},
		{of(assumption.NoFluidelasticInstability, "half the critical speed", finding.Stability, 0.5, 1, finding.Valid), water | group.Cross | group.Array, of1{group.FluidelasticSpeed: 0.5}},
		{of(assumption.NoWakeInterference, "in tandem at 7.6 D", finding.Stability, 0.5, 1, finding.Valid), beside,
			of1{group.NeighbourAlong: 7.6, group.NeighbourAcross: 0, group.ReducedVelocity: 5}},
		{of(assumption.NoWakeInterference, "side by side at 2.2 D", finding.Stability, 1, 1, finding.Marginal), beside,
			of1{group.NeighbourAlong: 0, group.NeighbourAcross: 2.2, group.ReducedVelocity: 5}},
		{of(assumption.NoWakeInterference, "in tandem at 10 D and U_R 30: a wake gallops", finding.Stability, 1, 1, finding.Marginal), beside,
			of1{group.NeighbourAlong: 10, group.NeighbourAcross: 0, group.ReducedVelocity: 30}},
		{of(assumption.NoOvalling, "half the speed", finding.Stability, 0.5, 1, finding.Valid), wind | group.Bluff, of1{group.OvallingSpeed: 0.5}},
		{of(assumption.QuasiStaticGusts, "B² 0.5, S_L R_ℓ R_b 0.02, ζ 1 %, I_u 0.1", finding.Load, (1+0.7*resonant)/(1+0.7*math.Sqrt(0.5))-1, 0.1, finding.Invalid), wind,
			of1{group.TurbulenceIntensity: 0.1, group.GustBackground: 0.5, group.GustResonance: 0.02, group.DampingRatio: 0.01}},
		{of(assumption.PlugFlow, "laminar: half of 1 − 3/4", finding.Load, 0.125, 0.1, finding.Marginal), column, of1{group.Reynolds: 1000}},
		{of(assumption.PlugFlow, "turbulent: half of 1 − 1/1.02", finding.Load, 0.01/1.02, 0.1, finding.Valid), column, of1{group.Reynolds: 1e5}},
		{of(assumption.OneDimensionalWaves, "fD/a", finding.Scale, 0.02, 0.1, finding.Valid), column, of1{group.WaveDiameter: 0.02}},
		{of(assumption.LongPulse, "R f/c", finding.Scale, 0.01, 0.1, finding.Valid), water | group.Internal | group.Pulsatile, of1{group.PulseLength: 0.01}},
		{of(assumption.NoAxialCoupling, "half of κa²/(c_s² − a²)", finding.Frequency, 0.02, 0.05, finding.Marginal), column, of1{group.AxialCoupling: 0.04}},
	}
}

// knownAnswers has at least one case for each assumption. Each estimate is worked
// from the formula that stands beside it, and not taken from a run.
func knownAnswers() []known {
	lo, end := bandOfRod()
	shed := math.Sqrt(260 * 190.0)
	ballMu := 0.5 / 4 // added over dry mass: half the displaced mass, a quarter of the density
	omega := 2 * math.Pi
	layer := func(f float64) float64 { return math.Sqrt(2 * 1e-6 / (omega * f)) } // δ in water, m
	return []known{
		// hazards
		{assumption.NoLockIn, "below the band 0.67 to 1.97", `{` + rod + `0.01},` + dense + `,"flow":{"speed":"0.1675 m/s"}}`,
			finding.Stability, 0.2 * 1.675 / lo, 1e-9, 1, finding.Valid},
		{assumption.NoLockIn, "in the middle of lock-in", `{` + rod + `0},` + dense + `,"flow":{"operating":["0 m/s","1 m/s"]}}`,
			finding.Stability, math.Sqrt(end / lo), 1e-9, 1, finding.Invalid}, // (lo·end)^½ over lo
		{assumption.NoLockIn, "the lower edge of the band is 0.67", `{` + rod + `0},` + dense + `,"flow":{"speed":"0.335 m/s"}}`,
			finding.Stability, 1, 1e-3, 1, finding.Marginal}, // 0.67/0.6703
		{assumption.NoLockIn, "along the flow at V_R 0.5", `{` + rod + `0.001},` + liquid + `,"flow":{"speed":"0.05 m/s"}}`,
			finding.Stability, 0.5, 1e-9, 1, finding.Valid},
		{assumption.NoGalloping, "2 Sc f b/a_G", // Sc = 4πmζ/(ρL²) per length, of a body that displaces π/4 L² over 1 m
			`{"structure":{"kind":"generic","shape":"bluff","length":"0.1 m","span":"1 m","volume":"7.853981633974483 L","mass":"78.53981633974483 kg","frequency_dry":"2 Hz","damping_ratio":0.01,"galloping_factor":2},` + dense + `,"flow":{"speed":"0.1 m/s"}}`,
			finding.Stability, 0.1 / (2 * (4 * math.Pi * 78.53981633974483 * 0.01 / 10) * 2 * 0.1 / 2), 1e-9, 1, finding.Valid},
		{assumption.NoDivergence, "panel between standing waves", `{` + panel + `,` + liquid + `,"flow":{"speed":"30 m/s"}}`,
			finding.Stability, 30 / panelDivergence / math.Pow(1-4e-4, 0.25), 1e-6, 1, finding.Valid},
		{assumption.NoFlutter, "2qa³/(D√(M² − 1)) against 343.36 at M 2", `{` + panel + `,` + gas + `,"flow":{"speed":"600 m/s"}}`,
			finding.Stability, math.Sqrt(1.2 * 600 * 600 / (panelStiffness * math.Sqrt(3)) / 343.36), 1e-5, 1, finding.Valid},
		{assumption.NoBucklingByFlow, "UL√(ρA/EI) against π", `{` + beam + `"pinned-pinned"},` + liquid + `,"flow":{"speed":"20 m/s","direction":"axial"}}`,
			finding.Stability, 20 / (math.Pi * math.Sqrt(210e9*0.02*0.02/16/1000)), 1e-9, 1, finding.Valid}, // EI/(ρA) = E D²/16ρ
		{assumption.NoBucklingByFlow, "clamped 2π", `{` + beam + `"clamped-clamped"},` + liquid + `,"flow":{"speed":"20 m/s","direction":"axial"}}`,
			finding.Stability, 20 / (2 * math.Pi * math.Sqrt(210e9*0.02*0.02/16/1000)), 1e-9, 1, finding.Valid},
		{assumption.NoAcousticResonance, "f_w 2d/c over 0.8",
			`{"structure":{"kind":"plate","length":"1 m","width":"1 m","thickness":"10 mm","density":"7850 kg/m3","young_modulus":"210 GPa","frequency_wet":"30 Hz"},` + gas + `,"surroundings":{"backing_depth":"2 m"}}`,
			finding.Stability, 30 * 4 / 300.0 / 0.8, 1e-9, 1, finding.Valid},

		// fluid at rest
		{assumption.FluidAbsent, "steel panel with water on one side", `{` + panel + `,` + liquid + `}`,
			finding.Frequency, math.Sqrt(1+panelAddedMass) - 1, 2e-3, 0.05, finding.Invalid}, // 1.49
		{assumption.FluidAbsent, "the panel in air", `{` + panel + `,` + gas + `}`,
			finding.Frequency, 0.5 * 0.40950 * 1.2 / 78.5, 2e-2, 0.05, finding.Valid},
		{assumption.FluidAbsent, "a box stiffer than the suspension", box, // ρc²A²/V over the stiffness
			finding.Frequency, 1 - 1/math.Sqrt(1+boxStiffness), 1e-9, 0.05, finding.Invalid},
		{assumption.IncompressibleOscillation, "no spring in a box of incompressible fluid", box,
			finding.Frequency, 1 - 1/math.Sqrt(1+boxStiffness), 1e-9, 0.05, finding.Invalid},
		{assumption.StillFluid, "reduced velocity without a flow stiffness",
			`{"structure":{"kind":"generic","length":"0.1 m","volume":"1 L","mass":"10 kg","frequency_dry":"10 Hz"},` + gas + `,"flow":{"speed":"0.3 m/s"}}`,
			finding.Frequency, 0.3, 1e-9, 1, finding.Valid},
		{assumption.StillFluid, "half the flow's stiffness of the panel", `{` + panel + `,` + liquid + `,"flow":{"speed":"60 m/s"}}`,
			finding.Frequency, 0.5 * math.Pow(60/panelDivergence, 2) / math.Sqrt(1-0.0016), 1e-6, 0.05, finding.Invalid},
		{assumption.InviscidOscillation, "Stokes' sphere", `{` + ball + `"1 Hz"},` + liquid + `}`, // Γr = 1 + (9/2) δ/a
			finding.Frequency, inertiaError(ballMu, 1+4.5*layer(1)/0.01), 1e-9, 0.05, finding.Valid},
		{assumption.InviscidOscillation, "cylinder with a thin layer", // Γr → 1 + 2δ/a
			`{"structure":{"kind":"cylinder","diameter":"0.1 m","mass_per_length":"15.70796326794897 kg/m","support":"spring-mounted","frequency_wet":"100 Hz"},` + liquid + `}`,
			finding.Frequency, inertiaError(0.5, 1+2*layer(100)/0.05), 1e-2, 0.05, finding.Valid},
		{assumption.IncompressibleOscillation, "sphere as a dipole", `{` + ball + `"20 kHz"},` + liquid + `}`, // Γr = 2(2 + x²)/(4 + x⁴), x = ka
			finding.Frequency, inertiaError(ballMu, dipole(omega*20e3*0.01/1500)), 1e-9, 0.05, finding.Valid},
		{assumption.IncompressibleOscillation, "sound asked for", `{"interest":["sound"],` + ball + `"1 Hz"},` + liquid + `}`,
			finding.Sound, 1, 0, 0.1, finding.Invalid},
		{assumption.UnboundedFluid, "cylinder in a shell of twice its width", // C = (q² + 1)/(q² − 1)
			`{"structure":{"kind":"cylinder","diameter":"0.1 m","mass_per_length":"15.70796326794897 kg/m","support":"spring-mounted","frequency_wet":"10 Hz"},` + liquid + `,"surroundings":{"shell_diameter":"0.2 m"}}`,
			finding.Frequency, math.Sqrt((1+0.5*5/3)/1.5) - 1, 1e-9, 0.05, finding.Invalid},
		{assumption.FreeSurfaceAbsent, "sphere below a pressure-free surface", // dipole image: 1 − (3/8)(a/d)³
			`{` + ball + `"30 Hz"},` + liquid + `,"surroundings":{"depth_below_surface":"20 mm"}}`,
			finding.Frequency, inertiaError(ballMu, 1-0.375/8), 1e-6, 0.05, finding.Valid},
		{assumption.RigidLid, "U²/2g over the depth", `{` + rod + `0.01},` + liquid + `,"flow":{"speed":"0.4 m/s"},"surroundings":{"depth_below_surface":"0.25 m","gravity":"10 m/s2"}}`,
			finding.Load, 0.5 * 0.16 / (10 * 0.25), 1e-9, 0.1, finding.Valid},
		{assumption.LinearFreeSurface, "ξ/d", `{` + rod + `0.01},` + liquid + `,"motion":{"amplitude":"10 mm"},"surroundings":{"depth_below_surface":"0.25 m"}}`,
			finding.Load, 0.04, 1e-9, 0.1, finding.Valid},
		{assumption.IsothermalWalls, "(γ − 1) δ_t/gap", // as the share v/(1 + v)
			`{"structure":{"kind":"plate","length":"10 mm","width":"10 mm","thickness":"0.1 mm","density":"2330 kg/m3","young_modulus":"160 GPa","frequency_wet":"1 kHz"},` + gas + `,"surroundings":{"wall_gap":"0.1 mm"}}`,
			finding.Response, share(0.4 * math.Sqrt(2*1.5e-5/(omega*1e3)) / math.Sqrt(0.7) / 1e-4), 1e-9, 0.2, finding.Marginal},
		{assumption.Continuum, "√(πγ/2) ν/(cg)",
			`{"structure":{"kind":"plate","length":"1 mm","width":"1 mm","thickness":"20 um","density":"2330 kg/m3","young_modulus":"160 GPa"},` + gas + `,"surroundings":{"wall_gap":"2 um"}}`,
			finding.Scale, math.Sqrt(math.Pi*0.7) * 1.5e-5 / (300 * 2e-6), 1e-9, 0.01, finding.Invalid},
		{assumption.SlipFilm, "the same against 880",
			`{"structure":{"kind":"plate","length":"1 mm","width":"1 mm","thickness":"20 um","density":"2330 kg/m3","young_modulus":"160 GPa"},` + gas + `,"surroundings":{"wall_gap":"2 um"}}`,
			finding.Scale, math.Sqrt(math.Pi*0.7) * 1.5e-5 / (300 * 2e-6), 1e-9, 880, finding.Valid},
		{assumption.NoSurfaceTension, "1/Bo", `{` + ball + `"30 Hz"},` + liquid + `,"surroundings":{"depth_below_surface":"20 mm","gravity":"10 m/s2"}}`,
			finding.Scale, 0.07 / (1000 * 10 * 4e-4), 1e-9, 0.1, finding.Valid},
		{assumption.NoSurfaceTension, "1/We of a stream", `{` + ball + `"30 Hz"},` + liquid + `,"flow":{"speed":"0.1 m/s"},"surroundings":{"depth_below_surface":"20 mm","gravity":"10 m/s2"}}`,
			finding.Scale, 0.07 / (1000 * 0.01 * 0.02), 1e-9, 0.1, finding.Invalid},
		{assumption.NoSurfaceTension, "1/Bo in waves on the same stream", `{` + rod + `0.01,"length":"6 m"},` + liquid + `,"flow":{"speed":"0.01 m/s"},"waves":{"height":"0.5 m","period":"4 s","depth":"5 m"},"surroundings":{"gravity":"10 m/s2"}}`,
			finding.Scale, 0.07 / (1000 * 10 * 0.01), 1e-9, 0.1, finding.Valid},
		{assumption.NoCavitation, "a subcritical cylinder, 1.2 over σ", `{` + rod + `0.01},` + liquid + `,"flow":{"speed":"1 m/s"},"motion":{"amplitude":"1 mm"}}`,
			finding.Stability, 1.2 / (1e5 / 500), 1e-9, 1, finding.Valid},

		// mean flow
		{assumption.IncompressibleFlow, "Prandtl and Glauert at M 0.3", `{` + panel + `,` + gas + `,"flow":{"speed":"90 m/s"}}`,
			finding.Load, 1/math.Sqrt(1-0.09) - 1, 1e-9, 0.1, finding.Valid},
		{assumption.LinearCompressible, "M 0.6 over 0.75", `{` + panel + `,` + gas + `,"flow":{"speed":"180 m/s"}}`,
			finding.Scale, 0.8, 1e-9, 1, finding.Valid},
		{assumption.LinearCompressible, "the middle of the transonic band", `{` + panel + `,` + gas + `,"flow":{"speed":"290.4737509655563 m/s"}}`,
			finding.Scale, math.Sqrt(1.25 / 0.75), 1e-6, 1, finding.Invalid}, // M = √(0.75·1.25)
		{assumption.InviscidFlow, "2 δ*/t of a laminar foil", `{` + foil + `,` + liquid + `,"flow":{"speed":"0.1 m/s"}}`, // Re 1e4
			finding.Load, 2 * 1.7208e-2 * 0.1 / 0.01, 1e-4, 0.1, finding.Invalid},
		{assumption.InviscidFlow, "a bluff body", `{` + rod + `0.01},` + liquid + `,"flow":{"speed":"1 m/s"}}`,
			finding.Load, 1, 0, 0.1, finding.Invalid},
		{assumption.NoStall, "(α + ωξ/U)/α_s", `{"structure":{"kind":"generic","shape":"streamlined","length":"0.1 m","volume":"1 L","mass":"4 kg","frequency_wet":"1 Hz","stall_angle":"0.2 rad"},` + liquid + `,"flow":{"speed":"1 m/s","incidence":"0.05 rad"},"motion":{"amplitude":"10 mm"}}`,
			finding.Stability, (0.05 + math.Atan(omega*0.01)) / 0.2, 1e-9, 1, finding.Valid},
		{assumption.LaminarFlow, "Re 100 of a wake that turns at 190 to 300", `{` + rod + `0.01},` + liquid + `,"flow":{"speed":"1 mm/s"}}`,
			finding.Scale, 100 / math.Sqrt(190*300), 1e-9, 1, finding.Valid},
		{assumption.SteadyFlow, "√(1 + (C_L′ DAF/C_D)²) − 1", // f_v/f_w = 0.2: DAF = 1/(1 − 0.04)
			`{"structure":{"kind":"cylinder","diameter":"0.1 m","mass_per_length":"15.70796326794897 kg/m","support":"spring-mounted","frequency_wet":"1 Hz","strouhal":0.2,"damping_ratio":0.01,"drag_coefficient":1.2,"lift_coefficient":0.3},` + dense + `,"flow":{"speed":"0.1 m/s"}}`,
			finding.Load, math.Hypot(1, 0.3/0.96/1.2) - 1, 1e-9, 0.1, finding.Valid},
		{assumption.TwoDimensional, "L/ℓ", `{` + beam + `"pinned-pinned"},` + liquid + `,"flow":{"speed":"1 cm/s"}}`,
			finding.Load, 0.02, 1e-9, 0.1, finding.Marginal},
		{assumption.TwoDimensional, "Re over the middle of 190 to 260", `{` + beam + `"pinned-pinned"},` + liquid + `,"flow":{"speed":"1 cm/s"}}`,
			finding.Scale, 200 / shed, 1e-9, 1, finding.Marginal},
		{assumption.QuasiSteady, "|C(0.26) − 1|", // k = ωb/U with b 0.05 m, f_w 1 Hz
			`{"structure":{"kind":"generic","shape":"streamlined","length":"0.1 m","volume":"1 L","mass":"4 kg","frequency_wet":"1 Hz"},` + liquid + `,"flow":{"speed":"1.2083048667653051 m/s"}}`,
			finding.Load, cmplx.Abs(theodorsen(0.26) - 1), 1e-6, 0.1, finding.Invalid},
		{assumption.QuasiSteady, "f_w over f_v of a wake", `{` + rod + `0.01},` + dense + `,"flow":{"speed":"2 m/s"}}`,
			finding.Scale, 0.25, 1e-9, 1.0 / 3, finding.Marginal},
		{assumption.PseudoStatic, "damping over stiffness of a panel, r = 2ω/(Uα)",
			`{"structure":{"kind":"plate","length":"1 m","width":"1 m","thickness":"10 mm","density":"7850 kg/m3","young_modulus":"210 GPa","edges":"SSSS","wetted_sides":1,"frequency_wet":"1 Hz"},` + liquid + `,"flow":{"speed":"50 m/s"}}`,
			finding.Load, math.Hypot(1, 2*omega/(50*math.Pi)) - 1, 1e-9, 0.1, finding.Valid},
		{assumption.CalibratedWake, "300 over Re 1000", `{` + rod + `0.01},` + liquid + `,"flow":{"speed":"1 cm/s"}}`,
			finding.Scale, 0.3, 1e-9, 1, finding.Valid},

		// structure
		{assumption.RigidStructure, "k_flow/(k − k_flow) of the panel", `{` + panel + `,` + liquid + `,"flow":{"speed":"16 m/s"}}`,
			finding.Load, feedback(math.Pow(16/panelDivergence, 2) / math.Sqrt(1-math.Pow(16.0/1500, 2))), 1e-6, 0.1, finding.Marginal},
		{assumption.SmallDisplacement, "slope of a cantilever, (1.3765 ξ/ℓ)²", `{` + beam + `"clamped-free"},` + gas + `,"motion":{"amplitude":"0.2 m"}}`,
			finding.Frequency, math.Pow(1.3765*0.2, 2), 1e-3, 0.05, finding.Marginal},
		{assumption.SmallDisplacement, "√(1 + (3/16)(ξ/r)²) between fixed pins", // r = D/4
			`{` + beam + `"pinned-pinned"},` + gas + `,"motion":{"amplitude":"2 mm"}}`,
			finding.Frequency, math.Sqrt(1+3.0/16*0.16) - 1, 1e-2, 0.05, finding.Valid},
		{assumption.SmallStroke, "ξ/L", `{` + rod + `0.01},` + liquid + `,"motion":{"amplitude":"5 mm"}}`,
			finding.Load, 0.05, 1e-9, 0.1, finding.Valid},
		{assumption.SmallStroke, "KC against 2", `{` + rod + `0.01},` + liquid + `,"motion":{"amplitude":"5 mm"}}`,
			finding.Scale, 2 * math.Pi * 0.05, 1e-9, 2, finding.Valid},
		{assumption.SingleMode, "next mode of a square panel at 5 times the frequency", `{` + panel + `,` + liquid + `}`,
			finding.Frequency, panelAddedMass / (1 + panelAddedMass) / 24, 1e-3, 0.05, finding.Marginal},
		{assumption.LinearStructure, "root strain of a cantilever, 3.516 ξD/2ℓ²", `{` + beam + `"clamped-free"},` + gas + `,"motion":{"amplitude":"10 mm"}}`,
			finding.Scale, 3.5160 * 0.01 * 0.01 / 0.002, 1e-4, 1, finding.Valid},

		// scales of reduced models, and coupling
		{assumption.Lubrication, "gap over width",
			`{"structure":{"kind":"plate","length":"1 mm","width":"0.5 mm","thickness":"20 um","density":"2330 kg/m3","young_modulus":"160 GPa"},` + gas + `,"surroundings":{"wall_gap":"2 um"}}`,
			finding.Scale, 0.004, 1e-9, 0.1, finding.Valid},
		{assumption.Slender, "D/ℓ", `{` + beam + `"pinned-pinned"},` + gas + `}`, finding.Scale, 0.02, 1e-9, 0.1, finding.Valid},
		{assumption.OneWay, "2ωξ/U", `{"structure":{"kind":"generic","shape":"streamlined","length":"0.1 m","volume":"1 L","mass":"4 kg","frequency_wet":"1 Hz","flow_stiffness":"0 N/m","divergence_speed":"50 m/s","flutter_speed":"50 m/s"},` + liquid + `,"flow":{"speed":"1 m/s"},"motion":{"amplitude":"2 mm"}}`,
			finding.Load, 2 * omega * 0.002, 1e-9, 0.1, finding.Valid},
		{assumption.OneWay, "½ k_flow/k of the panel", `{` + panel + `,` + liquid + `,"flow":{"speed":"60 m/s"},"motion":{"amplitude":"1 um"}}`,
			finding.Frequency, 0.5 * math.Pow(60/panelDivergence, 2) / math.Sqrt(1-0.0016), 1e-6, 0.05, finding.Invalid},
		{assumption.ExplicitCoupling, "μ of a rod of twice water's weight", `{` + rod + `0.01},"fluid":{"density":"1000 kg/m3","viscosity":"1 mPa s","phase":"liquid"}}`,
			finding.Stability, 0.5, 1e-9, 0.5, finding.Marginal},
	}
}

func share(v float64) float64 { return v / (1 + v) }

func feedback(kappa float64) float64 { return kappa / (1 - kappa) }

// dipole is the inertia of an oscillating sphere in sound over that in an
// incompressible fluid, 2(2 + x²)/(4 + x⁴).
func dipole(x float64) float64 { return 2 * (2 + x*x) / (4 + math.Pow(x, 4)) }

// partLike returns the part of a finding that has the estimate, the measure and
// the limit of a known answer, or nil.
func partLike(f *finding.Finding, k known) *finding.Part {
	for i := range f.Parts() {
		p := &f.Parts()[i]
		if !p.Waits && p.Measure == k.measure && math.Abs(p.Limit-k.limit) <= 1e-12 && math.Abs(p.Estimate-k.want) <= k.tol*k.want {
			return p
		}
	}
	return nil
}

func parts(f *finding.Finding) string {
	text := f.Verdict.String()
	if f.Reason != nil {
		text += ": " + f.Reason.Text
	}
	for _, p := range f.Parts() {
		text += fmt.Sprintf("; %s %.6g of %g, φ %g", p.Measure, p.Estimate, p.Limit, p.Factor)
		if p.Waits {
			text += " waits for " + group.Of(p.Wait).ID
		}
	}
	return text
}

func TestKnownAnswers(t *testing.T) {
	covered := map[string]int{}
	rows := 0
	check := func(k known, f *finding.Finding) {
		rows++
		covered[k.entry.ID]++
		if partLike(f, k) == nil {
			t.Errorf("%s, %s: no part has the estimate %.6g (%s, limit %g): %s", k.entry.ID, k.name, k.want, k.measure, k.limit, parts(f))
			return
		}
		if f.Verdict != k.verdict {
			t.Errorf("%s, %s: %s, want %s: %s", k.entry.ID, k.name, f.Verdict, k.verdict, parts(f))
		}
	}
	for _, k := range knownAnswers() {
		check(k, &answer(t, k.text).Findings[k.entry.Index()])
	}
	for _, k := range knownOfGroups() {
		g := group.New()
		g.Traits = k.traits
		for id, x := range k.values {
			g.Put(id, x)
		}
		fs := assumption.Judge(g, finding.Study{Tolerance: finding.Presets[0], Interest: finding.DefaultInterest})
		check(k.known, &fs.Made[k.entry.Index()])
	}
	for _, e := range assumption.Catalogue {
		if covered[e.ID] == 0 {
			t.Errorf("%s has no known answer", e.ID)
		}
	}
	if rows != 80 {
		t.Errorf("%d known answers", rows)
	}
}
