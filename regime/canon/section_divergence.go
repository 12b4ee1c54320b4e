package canon

import (
	"math"

	"regimed/regime/cite"
)

// sectionDivergenceMach is the end of the Prandtl–Glauert rule for lift.
const sectionDivergenceMach = 0.7

// SectionDivergence is the dynamic pressure at which a section twists off.
//
//	q_D c²/K_α = √(1 − M²)/(e C_Lα)
//
// Symbols: e = x_ea − ¼ [1], elastic axis behind the quarter chord in chords;
// liftSlope = C_Lα [1/rad], incompressible, 2π for a thin section; mach = M [1];
// K_α [N·m/rad per m] torsional stiffness per span, c [m] chord.
// Range: −1 ≤ e ≤ 1; 0 < C_Lα ≤ 20; 0 ≤ M ≤ 0.7. e ≤ 0: no divergence, +Inf.
// Accuracy: exact for linear lift.
// Check: e 0.25, C_Lα 2π, M 0: 0.636619772368.
// Source: Bisplinghoff, Ashley & Halfman 1955; Glauert 1928 (from memory).
func SectionDivergence(e, liftSlope, mach float64) (float64, error) {
	if err := inRange("SectionDivergence", "e", e, -1, 1); err != nil {
		return 0, err
	}
	if err := inRange("SectionDivergence", "lift_slope", liftSlope, 1e-3, 20); err != nil {
		return 0, err
	}
	if err := inRange("SectionDivergence", "mach", mach, 0, sectionDivergenceMach); err != nil {
		return 0, err
	}
	if e <= 0 {
		return math.Inf(1), nil
	}
	return math.Sqrt(1-mach*mach) / (e * liftSlope), nil
}

// SectionDivergenceSpeed is SectionDivergence in the terms of SectionFlutter.
//
//	U_D/(bω_α) = √(2μπr²·q_D c²/(4K_α)) = r√(μ/(1 + 2a)) for C_Lα = 2π, M = 0
//
// Symbols: μ = m/(πρb²) [1]; a, r² as there; results [1], +Inf for a ≤ −½.
// Range: as SectionFlutter and SectionDivergence.
// Accuracy: exact for linear lift.
// Check: μ 20, a −0.2, r² 0.24: 2.82842712475.
// Source: Bisplinghoff, Ashley & Halfman 1955 (from memory).
func SectionDivergenceSpeed(mu, a, r2, liftSlope, mach float64) (float64, error) {
	if err := inRange("SectionDivergenceSpeed", "mu", mu, 0.05, 1e4); err != nil {
		return 0, err
	}
	if err := inRange("SectionDivergenceSpeed", "a", a, -1, 1); err != nil {
		return 0, err
	}
	if err := inRange("SectionDivergenceSpeed", "r2", r2, 0.01, 4); err != nil {
		return 0, err
	}
	q, err := SectionDivergence((0.5+a)/2, liftSlope, mach)
	return math.Sqrt(math.Pi / 2 * mu * r2 * q), err
}

var sectionDivergenceEntry = &Entry{
	Name:     "SectionDivergence",
	Problem:  "static divergence of a section in pitch",
	Equation: "q_D c²/K_α = √(1 − M²)/(e C_Lα), e = x_ea − ¼ in chords; e ≤ 0: none",
	Args: []Arg{
		{Name: "e", Symbol: "e", Doc: "elastic axis behind the quarter chord, in chords", Min: -1, Max: 1, From: -0.2, To: 1, Typical: 0.25},
		{Name: "lift_slope", Symbol: "C_Lα", Doc: "incompressible lift slope per radian", Min: 1e-3, Max: 20, Optional: true, Default: 2 * math.Pi},
		{Name: "mach", Symbol: "M", Doc: "Mach number", Min: 0, Max: sectionDivergenceMach, Optional: true},
	},
	Outputs:  []Output{{ID: "pressure", Symbol: "q_D c²/K_α", Doc: "critical dynamic pressure; infinite where e ≤ 0", Unbounded: true}},
	Accuracy: 1e-12,
	Factor:   1.3,
	Sources:  []*cite.Source{cite.BisplinghoffAshleyHalfman1955, cite.Glauert1928},
	Eval: func(a []float64) ([]float64, error) {
		v, err := SectionDivergence(a[0], a[1], a[2])
		return []float64{v}, err
	},
}
