package canon

import (
	"math"

	"regimed/regime/cite"
)

// CouplingScheme names a sequential partitioned scheme by its time integration
// of the structure and its prediction of the interface.
type CouplingScheme string

// The schemes for which ExplicitCoupling knows the bound.
const (
	SchemeExplicitStructure CouplingScheme = "explicit_structure"
	SchemeTrapezoidal       CouplingScheme = "trapezoidal"
	SchemeTrapezoidalFirst  CouplingScheme = "trapezoidal_predicted"
)

// CouplingSchemes lists the schemes, in the order in which the entry numbers them.
func CouplingSchemes() []CouplingScheme {
	return []CouplingScheme{SchemeExplicitStructure, SchemeTrapezoidal, SchemeTrapezoidalFirst}
}

// ExplicitCoupling says how far a sequential scheme that exchanges once a step
// is from its instability with an incompressible fluid, at any time step.
//
//	one mode, no stiffness: m_s d̈ = −m_a a_f, a_f the second backward difference
//	of the predicted interface; |z| < 1 for μ below the limit:
//	explicit structure: z = −μ, limit 1
//	trapezoidal, interface as it was: 4z³ + μ(z + 1)² = 0, limit 2
//	trapezoidal, interface extrapolated by its velocity: 4z³ + μ(z + 1)(3z − 1) = 0, limit √5 − 1
//
// Symbols: mu = μ_max = m_a/m_s [1], the largest eigenvalue of the added-mass
// operator, that is of the wetted mode of longest wavelength; limit [1];
// ratio = μ/limit, unstable above 1.
// Range: 0 ≤ μ ≤ 1e12.
// Accuracy: exact for the model problem. Other schemes have constants of the
// same order, and better ones lower ones: the more accurate, the earlier unstable.
// Check: limits 1, 2, 1.2360679775.
// Source: the instability: Causin, Gerbeau & Nobile 2005; Förster, Wall & Ramm
// 2007 (from memory); the polynomials follow from the schemes as given here.
func ExplicitCoupling(mu float64, scheme CouplingScheme) (limit, ratio float64, err error) {
	if err := inRange("ExplicitCoupling", "mu", mu, 0, 1e12); err != nil {
		return 0, 0, err
	}
	switch scheme {
	case SchemeExplicitStructure:
		limit = 1
	case SchemeTrapezoidal:
		limit = 2
	case SchemeTrapezoidalFirst:
		limit = math.Sqrt(5) - 1
	default:
		return 0, 0, &RangeError{Function: "ExplicitCoupling", Arg: "scheme", Value: math.NaN(), Reason: "unknown scheme " + string(scheme)}
	}
	return limit, mu / limit, nil
}

// CompressibleCoupling is the mass of compressible fluid that a sequential
// scheme meets in one time step over that of the structure.
//
//	ρcΔt/m″ = (ρℓ/m″)·(cΔt/ℓ); a column of fluid under a mass, pressure one step
//	late: z = 1 − ρcΔt/m″, so that it decays without overshoot below 1
//
// Symbols: massRatio = ρℓ/m″ [1], ℓ any length, m″ structural mass per area;
// courant = cΔt/ℓ [1]; ratio [1]: stable below 1; courantLimit [1], the
// acoustic Courant number at which ratio is 1.
// Range: 1e-12 ≤ ρℓ/m″ ≤ 1e12; 0 ≤ cΔt/ℓ ≤ 1e12.
// Accuracy: exact for the model problem, which diverges only from 2; 1 is the
// bound that is kept.
// Check: ρℓ/m″ 2, cΔt/ℓ 0.25: ratio 0.5, limit 0.5.
// Source: van Brummelen 2009 (from memory).
func CompressibleCoupling(massRatio, courant float64) (ratio, courantLimit float64, err error) {
	if err := inRange("CompressibleCoupling", "mass_ratio", massRatio, 1e-12, 1e12); err != nil {
		return 0, 0, err
	}
	if err := inRange("CompressibleCoupling", "courant", courant, 0, 1e12); err != nil {
		return 0, 0, err
	}
	return massRatio * courant, 1 / massRatio, nil
}

// FixedPointRelaxation is the relaxation of the Dirichlet–Neumann iterations of
// an implicit partitioned scheme.
//
//	error of a mode after one iteration: |1 − ω_r(1 + μ)|;
//	limit 2/(1 + μ_max), optimum 2/(2 + μ_min + μ_max), rate (μ_max − μ_min)/(2 + μ_min + μ_max)
//
// Symbols: muMin, muMax = extreme added mass ratios of the wetted modes [1];
// limit, optimum = relaxation factors [1]; rate = error factor per iteration at
// the optimum [1], 0 for one mode.
// Range: 0 ≤ μ_min ≤ μ_max ≤ 1e12.
// Accuracy: exact for small time steps, in which structural stiffness is
// negligible beside inertia.
// Check: μ 1 to 3: limit 0.5, optimum 1/3, rate 1/3.
// Source: Causin, Gerbeau & Nobile 2005 (from memory).
func FixedPointRelaxation(muMin, muMax float64) (limit, optimum, rate float64, err error) {
	if err := inRange("FixedPointRelaxation", "mu_max", muMax, 0, 1e12); err != nil {
		return 0, 0, 0, err
	}
	if err := inRange("FixedPointRelaxation", "mu_min", muMin, 0, muMax); err != nil {
		return 0, 0, 0, err
	}
	sum := 2 + muMin + muMax
	return 2 / (1 + muMax), 2 / sum, (muMax - muMin) / sum, nil
}

var explicitCouplingEntry = &Entry{
	Name:     "ExplicitCoupling",
	Problem:  "added mass instability of a partitioned scheme with one exchange a step, incompressible fluid",
	Equation: "unstable at any time step for μ_max > constant of the scheme: 1 (explicit structure), 2 (trapezoidal), √5 − 1 (trapezoidal, interface extrapolated)",
	Args: []Arg{
		{Name: "mu", Symbol: "μ_max", Doc: "added mass over structural mass of the wetted mode of longest wavelength", Min: 0, Max: 1e12, From: 0, To: 5},
		{Name: "scheme", Symbol: "scheme", Doc: "structural integration and interface prediction", Choices: couplingSchemeNames(), Optional: true},
	},
	Outputs: []Output{
		{ID: "limit", Symbol: "μ_lim", Doc: "constant of the scheme"},
		{ID: "ratio", Symbol: "μ/μ_lim", Doc: "unstable above 1"},
	},
	Accuracy: 1e-12,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.Causin2005, cite.Forster2007},
	Note:     "no time step helps; stability lost earlier by thin light structures than by bulky ones of equal density ratio",
	Eval: func(a []float64) ([]float64, error) {
		limit, ratio, err := ExplicitCoupling(a[0], CouplingSchemes()[int(a[1])])
		return []float64{limit, ratio}, err
	},
}

func couplingSchemeNames() []string {
	var names []string
	for _, s := range CouplingSchemes() {
		names = append(names, string(s))
	}
	return names
}

var compressibleCouplingEntry = &Entry{
	Name:     "CompressibleCoupling",
	Problem:  "stability of a partitioned scheme with one exchange a step, compressible fluid",
	Equation: "ρcΔt/m″ < 1",
	Args: []Arg{
		{Name: "mass_ratio", Symbol: "ρℓ/m″", Doc: "fluid over structural mass per area, ℓ any length", Min: 1e-12, Max: 1e12, From: 0.01, To: 100, Typical: 1},
		{Name: "courant", Symbol: "cΔt/ℓ", Doc: "acoustic Courant number on the same length", Min: 0, Max: 1e12, Typical: 0.5},
	},
	Outputs: []Output{
		{ID: "ratio", Symbol: "ρcΔt/m″", Doc: "stable below 1"},
		{ID: "courant_limit", Symbol: "(cΔt/ℓ)_lim", Doc: "Courant number at which the ratio is 1"},
	},
	Accuracy: 1e-12,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.VanBrummelen2009},
	Eval: func(a []float64) ([]float64, error) {
		ratio, limit, err := CompressibleCoupling(a[0], a[1])
		return []float64{ratio, limit}, err
	},
}

var fixedPointRelaxationEntry = &Entry{
	Name:     "FixedPointRelaxation",
	Problem:  "relaxation of the iterations of an implicit partitioned scheme",
	Over:     "mu_max",
	Equation: "ω_r < 2/(1 + μ_max); optimum 2/(2 + μ_min + μ_max)",
	Args: []Arg{
		{Name: "mu_min", Symbol: "μ_min", Doc: "smallest added mass ratio of the wetted modes", Min: 0, Max: 1e12, Typical: 0.1},
		{Name: "mu_max", Symbol: "μ_max", Doc: "largest added mass ratio of the wetted modes", Min: 0, Max: 1e12, From: 0.1, To: 100},
	},
	Outputs: []Output{
		{ID: "limit", Symbol: "ω_lim", Doc: "relaxation factor above which the iterations diverge"},
		{ID: "optimum", Symbol: "ω_opt", Doc: "best constant relaxation factor"},
		{ID: "rate", Symbol: "q", Doc: "error factor per iteration at the optimum"},
	},
	Accuracy: 1e-12,
	Factor:   1.5,
	Sources:  []*cite.Source{cite.Causin2005},
	Limits: []Limit{
		{"heavy fluid: 2/μ_max", "limit", High, 1e-11, func(a []float64) float64 { return 2 / a[1] }},
		{"heavy fluid: 1", "rate", High, 1e-11, constant(1)},
	},
	Eval: func(a []float64) ([]float64, error) {
		limit, optimum, rate, err := FixedPointRelaxation(a[0], a[1])
		return []float64{limit, optimum, rate}, err
	},
}
