package canon

import (
	"math"

	"regimed/regime/cite"
)

// Mode factors γ of SkopGriffin (Skop & Griffin 1975, from memory).
const (
	ModeFactorSpringMounted = 1.0
	ModeFactorSine          = 1.155 // taut string, pinned beam
	ModeFactorCantilever    = 1.305
)

// SkopGriffin is the peak amplitude of vortex-induced vibration over diameter.
//
//	A/D = 1.29 γ/(1 + 0.43 S_G)^3.35
//
// Symbols: sg = S_G = 2π³St²α [1], the Skop–Griffin parameter (SkopGriffinParameter);
// gamma = γ [1], the mode factor: 1 spring-mounted, 1.155 taut string and
// pinned beam, 1.305 cantilever.
// Range: 0 ≤ S_G ≤ 1e6; 1 ≤ γ ≤ 2.
// Accuracy: a fit; measurements scatter by a factor of 1.5 to 2 about it.
// Check: S_G 0, γ 1: 1.29; S_G 1, γ 1: 0.3892.
// Source: Skop & Griffin 1975 (from memory).
func SkopGriffin(sg, gamma float64) (float64, error) {
	if err := inRange("SkopGriffin", "skop_griffin", sg, 0, 1e6); err != nil {
		return 0, err
	}
	if err := inRange("SkopGriffin", "mode_factor", gamma, 1, 2); err != nil {
		return 0, err
	}
	return 1.29 * gamma / math.Pow(1+0.43*sg, 3.35), nil
}

// SkopGriffinParameter is S_G = 2π³St²α.
//
//	S_G = 2 π³ St² α
//
// Symbols: strouhal = St [1]; alpha = α = (m* + C_A)ζ_w [1], m* mass over
// displaced mass, C_A added mass coefficient, ζ_w structural damping on the wet
// mass.
// Range: any finite values.
// Accuracy: exact.
// Check: St 0.2, α 0.1: 0.248050.
// Source: Skop & Griffin 1975 (from memory).
func SkopGriffinParameter(strouhal, alpha float64) float64 {
	return 2 * math.Pi * math.Pi * math.Pi * strouhal * strouhal * alpha
}

// GovardhanWilliamson is the peak amplitude of a spring-mounted cylinder over
// its diameter, with the effect of the Reynolds number.
//
//	A/D = max(0, (1 − 1.12 α + 0.30 α²) log₁₀(0.41 Re^0.36))
//
// Symbols: alpha = α = (m* + C_A)ζ_w [1], the mass-damping with the structural
// damping on the wet mass (for ζ on the dry mass α = ζ√(m*(m* + C_A))); re = Re [1].
// Range: 0 ≤ α ≤ 1; 500 ≤ Re ≤ 33 000.
// Accuracy: within about 10 % of the measurements it fits.
// Check: α 0, Re 1e4: 1.0528; α 0.2, Re 4000: 0.716706.
// Source: Govardhan & Williamson 2006 (from memory).
func GovardhanWilliamson(alpha, re float64) (float64, error) {
	if err := inRange("GovardhanWilliamson", "mass_damping", alpha, 0, 1); err != nil {
		return 0, err
	}
	if err := inRange("GovardhanWilliamson", "reynolds", re, 500, 33000); err != nil {
		return 0, err
	}
	return max(0, (1-1.12*alpha+0.30*alpha*alpha)*math.Log10(0.41*math.Pow(re, 0.36))), nil
}

var vortexAmplitudeEntry = &Entry{
	Name:     "VortexAmplitude",
	Problem:  "peak amplitude of vortex-induced vibration over diameter, by two fits",
	Equation: "1.29 γ/(1 + 0.43·2π³St²α)^3.35; (1 − 1.12 α + 0.30 α²) log₁₀(0.41 Re^0.36)",
	Args: []Arg{
		{Name: "mass_damping", Symbol: "α", Doc: "(m* + C_A)ζ_w, structural damping on the wet mass", Min: 0, Max: 1, Typical: 0.1},
		{Name: "reynolds", Symbol: "Re", Doc: "Reynolds number on the diameter", Min: 500, Max: 33000, Typical: 1e4},
		{Name: "strouhal", Symbol: "St", Doc: "Strouhal number", Min: 0.05, Max: 0.5, Optional: true, Default: 0.2},
		{Name: "mode_factor", Symbol: "γ", Doc: "1 spring-mounted, 1.155 taut string and pinned beam, 1.305 cantilever", Min: 1, Max: 2, Optional: true, Default: 1},
	},
	Outputs: []Output{
		{ID: "amplitude", Symbol: "A/D", Doc: "the larger of the two"},
		{ID: "skop_griffin", Symbol: "A/D", Doc: "by the Skop–Griffin fit"},
		{ID: "govardhan_williamson", Symbol: "A/D", Doc: "by the fit with Reynolds number"},
	},
	Accuracy: 0.3,
	Factor:   2,
	Sources:  []*cite.Source{cite.SkopGriffin1975, cite.GovardhanWilliamson2006},
	Note:     "fits of measurements; outside α 0 to 1 or Re 500 to 33 000 only SkopGriffin remains",
	Limits: []Limit{
		{"no damping: 1.29γ", "skop_griffin", Low, 1e-12, func(a []float64) float64 { return 1.29 * a[3] }},
		{"no damping: log₁₀(0.41 Re^0.36)", "govardhan_williamson", Low, 1e-12, func(a []float64) float64 { return math.Log10(0.41 * math.Pow(a[1], 0.36)) }},
	},
	Eval: func(a []float64) ([]float64, error) {
		sg, err := SkopGriffin(SkopGriffinParameter(a[2], a[0]), a[3])
		if err != nil {
			return nil, err
		}
		gw, err := GovardhanWilliamson(a[0], a[1])
		return []float64{max(sg, gw), sg, gw}, err
	},
}

var skopGriffinEntry = &Entry{
	Name:     "SkopGriffin",
	Problem:  "peak amplitude of vortex-induced vibration over diameter",
	Equation: "A/D = 1.29 γ/(1 + 0.43 S_G)^3.35",
	Args: []Arg{
		{Name: "skop_griffin", Symbol: "S_G", Doc: "2π³St²α", Min: 0, Max: 1e6, From: 0.01, To: 100},
		{Name: "mode_factor", Symbol: "γ", Doc: "1 spring-mounted, 1.155 taut string and pinned beam, 1.305 cantilever", Min: 1, Max: 2, Optional: true, Default: 1},
	},
	Outputs:  []Output{{ID: "amplitude", Symbol: "A/D", Doc: "peak amplitude over diameter"}},
	Accuracy: 0.3,
	Factor:   2,
	Sources:  []*cite.Source{cite.SkopGriffin1975},
	Limits: []Limit{
		{"no damping: 1.29γ", "amplitude", Low, 1e-12, func(a []float64) float64 { return 1.29 * a[1] }},
		{"much damping: 1.29γ/(0.43 S_G)^3.35", "amplitude", High, 1e-4, func(a []float64) float64 { return 1.29 * a[1] / math.Pow(0.43*a[0], 3.35) }},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := SkopGriffin(a[0], a[1])
		return []float64{v}, err
	},
}

var govardhanWilliamsonEntry = &Entry{
	Name:     "GovardhanWilliamson",
	Problem:  "peak amplitude of vortex-induced vibration of a spring-mounted cylinder, with the effect of Reynolds number",
	Equation: "A/D = (1 − 1.12 α + 0.30 α²) log₁₀(0.41 Re^0.36), not below 0",
	Args: []Arg{
		{Name: "mass_damping", Symbol: "α", Doc: "(m* + C_A)ζ_w, structural damping on the wet mass", Min: 0, Max: 1, Typical: 0.1},
		{Name: "reynolds", Symbol: "Re", Doc: "Reynolds number on the diameter", Min: 500, Max: 33000, Typical: 1e4},
	},
	Outputs:  []Output{{ID: "amplitude", Symbol: "A/D", Doc: "peak amplitude over diameter"}},
	Accuracy: 0.1,
	Factor:   2,
	Sources:  []*cite.Source{cite.GovardhanWilliamson2006},
	Limits: []Limit{
		{"no damping: log₁₀(0.41 Re^0.36)", "amplitude", Low, 1e-12, func(a []float64) float64 { return math.Log10(0.41 * math.Pow(a[1], 0.36)) }},
	},
	Eval: func(a []float64) ([]float64, error) {
		v, err := GovardhanWilliamson(a[0], a[1])
		return []float64{v}, err
	},
}
