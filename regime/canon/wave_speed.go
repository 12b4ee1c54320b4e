package canon

import (
	"math"
	"math/cmplx"

	"regimed/regime/cite"
)

// PipeAnchoring says how a pipe is held along its axis.
type PipeAnchoring string

// The anchorings that PipeConstraint knows.
const (
	AnchoredUpstream   PipeAnchoring = "upstream"
	AnchoredThroughout PipeAnchoring = "throughout"
	ExpansionJoints    PipeAnchoring = "expansion_joints"
)

// PipeAnchorings lists the anchorings, in the order in which the entry numbers them.
func PipeAnchorings() []PipeAnchoring {
	return []PipeAnchoring{AnchoredUpstream, AnchoredThroughout, ExpansionJoints}
}

// Ranges of the pressure wave functions, all in SI units.
const (
	stiffnessMin, stiffnessMax = 1e2, 1e13
	densityMin, densityMax     = 1e-6, 1e5
	lengthMin, lengthMax       = 1e-7, 1e3
)

// WaveSpeed is the speed of a pressure wave in the fluid that fills an elastic
// pipe.
//
//	a = √(K/ρ)/√(1 + c₁KD/(Ee))
//
// Symbols: bulk = K [Pa] bulk modulus, density = ρ [kg/m³]; diameter = D [m]
// inside, wall = e [m], modulus = E [Pa] of the wall; constraint = c₁ [1] by
// anchoring and wall (PipeConstraint), 1 for a thin wall with expansion joints.
// Range: positive values, D/e ≥ 0.1; 0.1 ≤ c₁ ≤ 100.
// Accuracy: exact for long waves.
// Check: K 2.2e9, ρ 998, D 0.5, e 0.01, E 2e11, c₁ 1: 1192.55995119 m/s.
// Source: Korteweg 1878; Wylie & Streeter 1993 (from memory).
func WaveSpeed(bulk, density, diameter, wall, modulus, constraint float64) (float64, error) {
	for _, c := range []struct {
		name          string
		v, vMin, vMax float64
	}{
		{"bulk_modulus", bulk, stiffnessMin, stiffnessMax},
		{"density", density, densityMin, densityMax},
		{"diameter", diameter, lengthMin, lengthMax},
		{"wall", wall, lengthMin, lengthMax},
		{"wall_modulus", modulus, stiffnessMin, stiffnessMax},
		{"constraint", constraint, 0.1, 100},
	} {
		if err := inRange("WaveSpeed", c.name, c.v, c.vMin, c.vMax); err != nil {
			return 0, err
		}
	}
	return math.Sqrt(bulk / density / (1 + constraint*bulk*diameter/(modulus*wall))), nil
}

// PipeConstraint is the factor c₁ of WaveSpeed.
//
//	c₁ = 2(e/D)(1 + ν) + c·D/(D + e); c = 1 − ν/2 upstream end anchored,
//	1 − ν² anchored throughout, 1 with expansion joints throughout
//
// Symbols: nu = ν [1], Poisson's ratio; slenderness = D/e [1], inside diameter
// over wall. D/e→∞: c, the thin wall, 6 % lower at D/e 25. The thick form is
// the elastic solution for any wall (Lamé) with c = 1, so that it is used throughout.
// Range: 0 ≤ ν ≤ 0.5; D/e ≥ 0.1.
// Accuracy: exact with expansion joints; 1 % for the other two, thin walls.
// Check: upstream, ν 0.3, D/e 1e9: 0.85; expansion joints, ν 0.3, D/e 10: 1.16909.
// Source: Wylie & Streeter 1993 (from memory).
func PipeConstraint(anchoring PipeAnchoring, nu, slenderness float64) (float64, error) {
	if err := inRange("PipeConstraint", "poisson", nu, 0, 0.5); err != nil {
		return 0, err
	}
	if err := inRange("PipeConstraint", "slenderness", slenderness, 0.1, 1e9); err != nil {
		return 0, err
	}
	var c float64
	switch anchoring {
	case AnchoredUpstream:
		c = 1 - nu/2
	case AnchoredThroughout:
		c = 1 - nu*nu
	case ExpansionJoints:
		c = 1
	default:
		return 0, &RangeError{Function: "PipeConstraint", Arg: "anchoring", Value: math.NaN(), Reason: "unknown anchoring " + string(anchoring)}
	}
	return 2*(1+nu)/slenderness + c*slenderness/(slenderness+1), nil
}

// JoukowskySurge is the pressure rise in a pipe when the flow in it is changed.
//
//	Δp = ρaΔU·min(1, (2L/a)/t_c)
//
// Symbols: density = ρ [kg/m³]; waveSpeed = a [m/s]; change = ΔU [m/s];
// closure = t_c/(2L/a) [1], time of the change over the return time of the wave.
// Range: positive values; closure ≥ 0.
// Accuracy: exact for a sudden change; slower ones by a linear law without friction.
// Check: water 998, a 1200, ΔU 1, sudden: 1.1976 MPa.
// Source: Joukowsky 1898; Wylie & Streeter 1993 (from memory).
func JoukowskySurge(density, waveSpeed, change, closure float64) (float64, error) {
	for _, c := range []struct {
		name          string
		v, vMin, vMax float64
	}{
		{"density", density, densityMin, densityMax},
		{"wave_speed", waveSpeed, 1e-3, 1e5},
		{"velocity_change", change, 0, 1e4},
		{"closure", closure, 0, 1e12},
	} {
		if err := inRange("JoukowskySurge", c.name, c.v, c.vMin, c.vMax); err != nil {
			return 0, err
		}
	}
	return density * waveSpeed * change / max(1, closure), nil
}

// MoensKorteweg is the speed of the pulse wave in a thin-walled tube that is
// much softer than the fluid.
//
//	c = √(Eh/(2ρR))
//
// Symbols: modulus = E [Pa], wall = h [m], density = ρ [kg/m³], radius = R [m].
// Range: positive values.
// Accuracy: exact for long waves, thin wall, inviscid fluid; wider R by the
// mean of inner and outer radius.
// Check: E 4e5, h 1e-3, ρ 1060, R 0.01: 4.34372 m/s.
// Source: Moens 1878; Korteweg 1878 (from memory).
func MoensKorteweg(modulus, wall, density, radius float64) (float64, error) {
	for _, c := range []struct {
		name          string
		v, vMin, vMax float64
	}{
		{"wall_modulus", modulus, stiffnessMin, stiffnessMax},
		{"wall", wall, lengthMin, lengthMax},
		{"density", density, densityMin, densityMax},
		{"radius", radius, lengthMin, lengthMax},
	} {
		if err := inRange("MoensKorteweg", c.name, c.v, c.vMin, c.vMax); err != nil {
			return 0, err
		}
	}
	return math.Sqrt(modulus * wall / (2 * density * radius)), nil
}

// PulseWave is phase speed and attenuation of the pulse wave in a viscous fluid,
// from the complex 1 − F₁₀ of PulsatileTube.
//
//	k = (ω/c₀)/√(1 − F₁₀): c/c₀ = 1/Re(1/√(1 − F₁₀)), amplitude over a wavelength e^{2π Im k/Re k}
//
// Symbols: re, im of 1 − F₁₀ [1], for e^{+iωt}; speed = c/c₀ [1], c₀ by
// MoensKorteweg; decay [1], amplitude left after one wavelength.
// Range: 0 ≤ re ≤ 1, 0 ≤ im ≤ 1, not both 0.
// Accuracy: exact for long waves in a tube held along its axis.
// Check: 1 − F₁₀ = 1: speed 1, decay 1; purely imaginary: decay e^{−2π} = 0.00186744.
// Source: Womersley 1957 (from memory).
func PulseWave(re, im float64) (speed, decay float64, err error) {
	if err := inRange("PulseWave", "re", re, 0, 1); err != nil {
		return 0, 0, err
	}
	if err := inRange("PulseWave", "im", im, 0, 1); err != nil {
		return 0, 0, err
	}
	if re+im < 1e-300 {
		return 0, 0, &RangeError{Function: "PulseWave", Arg: "re", Value: re, Reason: "1 − F₁₀ vanishes: no wave"}
	}
	k := 1 / cmplx.Sqrt(complex(re, im))
	return 1 / real(k), math.Exp(2 * math.Pi * imag(k) / real(k)), nil
}

var waveSpeedEntry = &Entry{
	Name:     "WaveSpeed",
	Problem:  "speed of a pressure wave in the fluid in an elastic pipe (SI units)",
	Equation: "a = √(K/ρ)/√(1 + c₁KD/(Ee))",
	Args: []Arg{
		{Name: "bulk_modulus", Symbol: "K", Doc: "bulk modulus of the fluid, Pa", Min: stiffnessMin, Max: stiffnessMax, From: 1e5, To: 1e13, Typical: 2.2e9},
		{Name: "density", Symbol: "ρ", Doc: "density of the fluid, kg/m³", Min: densityMin, Max: densityMax, Typical: 1000},
		{Name: "diameter", Symbol: "D", Doc: "inside diameter, m", Min: lengthMin, Max: lengthMax, Typical: 0.5},
		{Name: "wall", Symbol: "e", Doc: "wall thickness, m", Min: lengthMin, Max: lengthMax, Typical: 0.01},
		{Name: "wall_modulus", Symbol: "E", Doc: "modulus of the wall, Pa", Min: stiffnessMin, Max: stiffnessMax, Typical: 2e11},
		{Name: "constraint", Symbol: "c₁", Doc: "factor of anchoring and wall (PipeConstraint)", Min: 0.1, Max: 100, Optional: true, Default: 1},
	},
	Outputs:  []Output{{ID: "speed", Symbol: "a", Doc: "wave speed, m/s"}},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Korteweg1878, cite.WylieStreeter1993},
	Note:     "long waves; free gas in the liquid lowers the speed much more than the wall does",
	Limits: []Limit{
		{"stiff wall, sound: √(K/ρ)", "speed", Low, 1e-6, func(a []float64) float64 { return math.Sqrt(a[0] / a[1]) }},
		{"soft wall: √(Ee/(c₁ρD))", "speed", High, 1e-3, func(a []float64) float64 { return math.Sqrt(a[4] * a[3] / (a[5] * a[1] * a[2])) }},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := WaveSpeed(a[0], a[1], a[2], a[3], a[4], a[5])
		return []float64{v}, err
	},
}

var pipeConstraintEntry = &Entry{
	Name:     "PipeConstraint",
	Problem:  "factor of anchoring and wall thickness in the speed of a pressure wave in a pipe",
	Equation: "c₁ = 2(e/D)(1 + ν) + c D/(D + e); c = 1 − ν/2, 1 − ν², 1",
	Args: []Arg{
		{Name: "anchoring", Symbol: "anchoring", Doc: "upstream end only, throughout, or expansion joints throughout", Choices: pipeAnchoringNames()},
		{Name: "slenderness", Symbol: "D/e", Doc: "inside diameter over wall", Min: 0.1, Max: 1e9, From: 1, To: 1000},
		{Name: "poisson", Symbol: "ν", Doc: "Poisson's ratio of the wall", Min: 0, Max: 0.5, Optional: true, Default: 0.3},
	},
	Outputs:  []Output{{ID: "constraint", Symbol: "c₁", Doc: "factor c₁ of WaveSpeed"}},
	Accuracy: 0.01,
	Factor:   1,
	Sources:  []*cite.Source{cite.WylieStreeter1993},
	Limits: []Limit{
		{"thick wall: 2(1 + ν)e/D", "constraint", Low, 0.01, func(a []float64) float64 { return 2 * (1 + a[2]) / a[1] }},
		{"thin wall: 1 − ν/2, 1 − ν², 1", "constraint", High, 1e-8, func(a []float64) float64 {
			return [...]float64{1 - a[2]/2, 1 - a[2]*a[2], 1}[int(a[0])]
		}},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := PipeConstraint(PipeAnchorings()[int(a[0])], a[2], a[1])
		return []float64{v}, err
	},
}

func pipeAnchoringNames() []string {
	var names []string
	for _, a := range PipeAnchorings() {
		names = append(names, string(a))
	}
	return names
}

var joukowskySurgeEntry = &Entry{
	Name:     "JoukowskySurge",
	Problem:  "pressure rise in a pipe when its flow is changed (SI units)",
	Over:     "closure",
	Equation: "Δp = ρaΔU·min(1, (2L/a)/t_c)",
	Args: []Arg{
		{Name: "density", Symbol: "ρ", Doc: "density of the fluid, kg/m³", Min: densityMin, Max: densityMax, Typical: 1000},
		{Name: "wave_speed", Symbol: "a", Doc: "wave speed, m/s", Min: 1e-3, Max: 1e5, Typical: 1200},
		{Name: "velocity_change", Symbol: "ΔU", Doc: "change of the flow speed, m/s", Min: 0, Max: 1e4, Typical: 1},
		{Name: "closure", Symbol: "t_c a/(2L)", Doc: "time of the change over the return time of the wave", Min: 0, Max: 1e12, Optional: true, From: 0.1, To: 100},
	},
	Outputs:  []Output{{ID: "pressure", Symbol: "Δp", Doc: "pressure rise, Pa"}},
	Accuracy: 1e-12,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.Joukowsky1898, cite.WylieStreeter1993},
	Note:     "no friction, no column separation",
	Limits: []Limit{
		{"sudden: ρaΔU", "pressure", Low, 1e-12, func(a []float64) float64 { return a[0] * a[1] * a[2] }},
		{"slow: ρaΔU/(t_c a/(2L))", "pressure", High, 1e-12, func(a []float64) float64 { return a[0] * a[1] * a[2] / a[3] }},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := JoukowskySurge(a[0], a[1], a[2], a[3])
		return []float64{v}, err
	},
}

var moensKortewegEntry = &Entry{
	Name:     "MoensKorteweg",
	Problem:  "speed of the pulse wave in a thin soft tube (SI units)",
	Equation: "c = √(Eh/(2ρR))",
	Args: []Arg{
		{Name: "wall_modulus", Symbol: "E", Doc: "modulus of the wall, Pa", Min: stiffnessMin, Max: stiffnessMax, From: 1e4, To: 1e8, Typical: 4e5},
		{Name: "wall", Symbol: "h", Doc: "wall thickness, m", Min: lengthMin, Max: lengthMax, Typical: 1e-3},
		{Name: "density", Symbol: "ρ", Doc: "density of the fluid, kg/m³", Min: densityMin, Max: densityMax, Typical: 1060},
		{Name: "radius", Symbol: "R", Doc: "radius, m", Min: lengthMin, Max: lengthMax, Typical: 0.01},
	},
	Outputs:  []Output{{ID: "speed", Symbol: "c", Doc: "pulse wave speed, m/s"}},
	Accuracy: 1e-12,
	Factor:   1.15,
	Sources:  []*cite.Source{cite.Moens1878, cite.Korteweg1878},
	Note:     "thin wall, long waves, fluid stiff against the wall",
	Eval: func(a []float64) ([]float64, error) {
		v, err := MoensKorteweg(a[0], a[1], a[2], a[3])
		return []float64{v}, err
	},
}

var pulseWaveEntry = &Entry{
	Name:     "PulseWave",
	Problem:  "phase speed and attenuation of the pulse wave in a viscous fluid",
	Equation: "c/c₀ = 1/Re(1/√(1 − F₁₀)); decay per wavelength e^{2π Im k/Re k}, k ∝ 1/√(1 − F₁₀)",
	Args: []Arg{
		{Name: "re", Symbol: "Re(1 − F₁₀)", Doc: "real part of PulsatileTube", Min: 0, Max: 1, From: 0, To: 1},
		{Name: "im", Symbol: "Im(1 − F₁₀)", Doc: "imaginary part of PulsatileTube", Min: 0, Max: 1, Typical: 0.1},
	},
	Outputs: []Output{
		{ID: "speed", Symbol: "c/c₀", Doc: "phase speed over that of MoensKorteweg"},
		{ID: "decay", Symbol: "", Doc: "amplitude left after one wavelength"},
	},
	Accuracy: 1e-12,
	Factor:   1.3,
	Sources:  []*cite.Source{cite.WomersleyWave1957},
	Note:     "tube held along its axis, elastic wall",
	Eval: func(a []float64) ([]float64, error) {
		speed, decay, err := PulseWave(a[0], a[1])
		return []float64{speed, decay}, err
	},
}
