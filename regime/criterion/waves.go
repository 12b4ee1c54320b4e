package criterion

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// The criteria for waves and for liquids in tanks. They stand beside the
// physical model; no case picks them.
var (
	dnvC205Slender = &finding.Criterion{
		ID: "dnv-c205-slender", Assumption: "long-wave",
		Standard: "DNV-RP-C205", Edition: "from memory, edition not checked", Clause: "section 6",
		Formula: "a body is slender for D/λ < 0.2",
		Source:  cite.DNVC205Waves,
		Applies: func(x *finding.Context) bool { return x.Is(group.Waves) },
		Estimate: func(x *finding.Context) (float64, bool) {
			return x.Get(group.Diffraction) / 0.2, x.Has(group.Diffraction)
		},
		Say: finding.Say("By DNV-RP-C205 the body stands at {u} of what makes it a large one."),
	}
	api650Convective = &finding.Criterion{
		ID: "api-650-e-convective", Assumption: "free-surface-absent",
		Standard: "API 650, Appendix E", Edition: "from memory, edition not checked", Clause: "E.6.1.1",
		Formula: "convective mass W_c/W = 0.230 (D/H) tanh(3.67 H/D), after Housner, against the tolerance of load",
		Source:  cite.API650E,
		Applies: func(x *finding.Context) bool { return x.Is(group.Sloshing | group.Circular) },
		Estimate: func(x *finding.Context) (float64, bool) {
			return Housner(x.Get(group.FillRatio)) / x.Tolerance.Load, x.Has(group.FillRatio)
		},
		Say: finding.Say("By API 650 App. E the convective mass stands at {u} of the tolerance of load."),
	}
	api650Period = &finding.Criterion{
		ID: "api-650-e-period", Assumption: "no-sloshing-resonance",
		Standard: "API 650, Appendix E", Edition: "from memory, edition not checked", Clause: "E.4.5.2",
		Formula: "T_c = 1.8 K_s √D, K_s = 0.578/√tanh(3.68 H/D), D in m: ω_c²D/g = 3.68 tanh(3.68 H/D); the excitation outside 0.8 … 1.25 of it",
		Source:  cite.API650E,
		Applies: func(x *finding.Context) bool { return x.Is(group.Sloshing | group.Circular) },
		Estimate: func(x *finding.Context) (float64, bool) {
			if !x.Has(group.SloshingRatio) || !x.Has(group.FillRatio) {
				return 0, false
			}
			u, _ := finding.Band(x.Get(group.SloshingRatio)/APIConvectiveRatio(x.Get(group.FillRatio)), 0.8, 1.25, 1)
			return u, true
		},
		Say: finding.Say("By the convective period of API 650 App. E the excitation stands at {u} of the band of resonance."),
	}
	api650Freeboard = &finding.Criterion{
		ID: "api-650-e-freeboard", Assumption: "no-slamming",
		Standard: "API 650, Appendix E", Edition: "from memory, edition not checked", Clause: "E.7.2",
		Formula: "sloshing wave 0.42 D A_f, A_f the spectral acceleration of the convective mode over gravity, below the freeboard",
		Source:  cite.API650Freeboard,
		Applies: func(x *finding.Context) bool { return x.Is(group.Sloshing | group.Circular | group.Spectrum) },
		Estimate: func(x *finding.Context) (float64, bool) {
			return x.Get(group.CrestClearance) * 0.42 / upright, x.Has(group.CrestClearance)
		},
		Say: finding.Say("By API 650 App. E the sloshing wave stands at {u} of the freeboard."),
	}
)

// upright is η/(D A_f) of the first mode of an upright circular tank, 1/(ε₁² − 1).
const upright = 1 / (1.8411837813406593*1.8411837813406593 - 1)

// Housner is the convective mass share of an upright circular tank as standards
// print it.
//
//	W_c/W = 0.230 (D/H) tanh(3.67 H/D)
//
// Symbols: fill = H/D [1], liquid depth over diameter. Range: fill > 0.
// Accuracy: within 2 % of the first mode of linear theory, but a tank so shallow
// that tanh is its argument, 0.844 against 0.837.
// Check: fill 0.5: 0.4372. Source: Housner 1957; API 650 App. E, E.6.1.1, from memory.
func Housner(fill float64) float64 { return 0.230 / fill * math.Tanh(3.67*fill) }

// APIConvectiveRatio is the convective frequency of API 650 App. E over that of
// linear theory.
//
//	√(3.68 tanh(3.68 H/D)/(2ε₁ tanh(2ε₁ H/D))), ε₁ = 1.8412
//
// Symbols: fill = H/D [1]. Range: fill > 0. Accuracy: of the printed constants.
// Check: 1.000 within 0.1 % at any fill. Source: API 650 App. E, E.4.5.2, from
// memory: T_c = 1.8 K_s √D in s and m is 2π√(D/(3.68 g tanh(3.68 H/D))).
func APIConvectiveRatio(fill float64) float64 {
	const root = 2 * 1.8411837813406593
	return math.Sqrt(3.68 * math.Tanh(3.68*fill) / (root * math.Tanh(root*fill)))
}
