package fluid

import (
	"math"

	"regimed/regime/cite"
)

// Constants of CODATA 2018, from memory.
const (
	molarGasConstant        = 8.314462618 // J/(mol·K)
	secondRadiationConstant = 1.438776877 // cm·K, h·c/k
)

// How far a gas may be from ideal.
const (
	// largestDeviation bounds |pv/(RT) − 1|: the density is then within 5 %
	// and the sound speed, which feels half of it, within about 3 %.
	largestDeviation = 0.05
	// largestSaturation bounds p/p_sat(T): nearer, a gas in motion condenses
	// and the ideal gas is the wrong model, not only an inexact one.
	largestSaturation = 0.9
	lowestGasPressure = 1e-3 // Pa; rarefaction is judged by whoever knows the gap
)

// gas is an ideal gas with what its properties need.
type gas struct {
	molarMass float64 // kg/mol

	rotations  int         // classical rotational degrees of freedom: 0, 2 or 3
	vibrations []vibration // harmonic
	ratio      float64     // fixed heat capacity ratio; 0: from rotations and vibrations

	viscosity    sutherland
	conductivity func(T float64) float64 // W/(m·K); nil: Eucken's relation
	saturation   func(T float64) float64 // Pa, +Inf above the critical point; nil: range is supercritical or guarded by the deviation

	// of the second virial coefficient
	criticalTemperature, criticalPressure, acentric float64
}

// vibration is a fundamental of the molecule.
type vibration struct {
	wavenumber float64 // 1/cm
	degeneracy float64
}

// sutherland holds the constants of Sutherland's law.
type sutherland struct{ viscosity, temperature, constant float64 }

// at is the viscosity of a dilute gas.
//
//	μ = μ₀ (T/T₀)^(3/2) (T₀ + S)/(T + S)
//
// μ₀ in Pa·s at T₀ in K, S Sutherland's constant in K. Range and accuracy are
// those of the gas, 2 to 3 % here. Check: the viscosity of each gas at 300 K.
// Source: White, Viscous Fluid Flow, Table 1-2, from memory.
func (s sutherland) at(T float64) float64 {
	x := T / s.temperature
	return s.viscosity * x * math.Sqrt(x) * (s.temperature + s.constant) / (T + s.constant)
}

// isochoricHeat is the heat capacity at constant volume of the ideal gas by
// the gas constant.
//
//	c_v/R = 3/2 + f/2 + Σ g ((θ/2T)/sinh(θ/2T))², θ = (h c/k) ν̃
//
// f rotational degrees of freedom, g degeneracy and ν̃ wavenumber of a
// vibration, T temperature in K. Range: rotation classical, so above 250 K for
// hydrogen and everywhere for the rest. Accuracy: 1 %, without anharmonicity.
// Check: c_p/R = 4.476 of CO2 at 300 K. Source: statistical mechanics of the
// rigid rotor and harmonic oscillator; wavenumbers Shimanouchi 1972, from
// memory.
func (g *gas) isochoricHeat(T float64) float64 {
	if g.ratio > 0 {
		return 1 / (g.ratio - 1)
	}
	sum := 1.5 + float64(g.rotations)/2
	for _, v := range g.vibrations {
		x := secondRadiationConstant * v.wavenumber / (2 * T)
		y := x / math.Sinh(x)
		sum += v.degeneracy * y * y
	}
	return sum
}

// secondVirial is the second virial coefficient in m³/mol.
//
//	B p_c/(R T_c) = 0.083 − 0.422/T_r^1.6 + ω (0.139 − 0.172/T_r^4.2)
//
// T_r = T/T_c, T_c and p_c critical temperature and pressure, ω acentric
// factor; for helium and hydrogen the classical constants, ω = 0. Range: T_r
// above 0.6. Accuracy: some 10 cm³/mol, enough to bound a deviation, not to
// correct it. Check: −4.5 cm³/mol of nitrogen at 300 K. Source: Smith, Van
// Ness and Abbott, Eqs. 3.63 to 3.66, from memory.
func (g *gas) secondVirial(T float64) float64 {
	r := T / g.criticalTemperature
	b := 0.083 - 0.422/math.Pow(r, 1.6) + g.acentric*(0.139-0.172/math.Pow(r, 4.2))
	return b * molarGasConstant * g.criticalTemperature / g.criticalPressure
}

// specificConstant is R/M in J/(kg·K).
func (g *gas) specificConstant() float64 { return molarGasConstant / g.molarMass }

// prandtl is μ c_p/k, with k of the gas where it is known and otherwise by
// Eucken's relation.
//
//	Pr = 4γ/(9γ − 5)
//
// γ heat capacity ratio. Range: dilute non-polar gases. Accuracy: exact to
// 0.5 % for monatomic gases, within 6 % for the others here. Check: 2/3 for
// γ = 5/3. Source: Chapman and Cowling, chapter 13, from memory.
func (g *gas) prandtl(T, μ float64) float64 {
	cv := g.isochoricHeat(T)
	γ := 1 + 1/cv
	if g.conductivity == nil {
		return 4 * γ / (9*γ - 5)
	}
	return μ * (cv + 1) * g.specificConstant() / g.conductivity(T)
}

// at gives the ideal gas.
//
//	ρ = p/(R T), c² = γ R T
//
// R gas constant in J/(kg·K), γ heat capacity ratio, p pressure in Pa, T
// temperature in K. Range: gas.limits. Accuracy: 5 % in ρ at the limits, and
// about in proportion to p below. Check: air at 288.15 K and 101325 Pa 1.2250 kg/m³
// and 340.294 m/s. Source: US Standard Atmosphere 1976 Eqs. 42 and 50, from memory.
func (g *gas) at(s State) Properties {
	R := g.specificConstant()
	p := nothing()
	p.Density = s.Pressure / (R * s.Temperature)
	p.Viscosity = g.viscosity.at(s.Temperature)
	p.HeatCapacityRatio = 1 + 1/g.isochoricHeat(s.Temperature)
	p.SoundSpeed = math.Sqrt(p.HeatCapacityRatio * R * s.Temperature)
	p.Prandtl = g.prandtl(s.Temperature, p.Viscosity)
	return p
}

// limits is where the gas is ideal enough and dry enough.
func (g *gas) limits(s State) (Interval, string) {
	ideal := largestDeviation * molarGasConstant * s.Temperature / math.Abs(g.secondVirial(s.Temperature))
	if g.saturation == nil {
		return Interval{lowestGasPressure, ideal}, notIdeal
	}
	dry := largestSaturation * g.saturation(s.Temperature)
	if dry < ideal {
		return Interval{lowestGasPressure, dry}, "too near saturation: above nine tenths of the saturation pressure the gas condenses"
	}
	return Interval{lowestGasPressure, ideal}, notIdeal
}

const notIdeal = "the gas departs from the ideal gas by more than 5 % in density"

// model completes m to the model of the gas.
func (g *gas) model(m Model) *Model {
	m.Phase = Gas
	m.UsesTemperature, m.UsesPressure = true, true
	m.Range.Pressure.Min = lowestGasPressure
	if m.Default == (State{}) {
		m.Default = State{Temperature: 293.15, Pressure: standardAtmosphere}
	}
	m.Sources = append(m.Sources, cite.SmithVanNess, cite.CODATA2018)
	m.limits = g.limits
	m.eval = g.at
	return &m
}
