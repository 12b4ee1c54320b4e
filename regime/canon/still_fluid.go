package canon

import (
	"math"

	"regimed/regime/cite"
)

// exactGeometryFactor is the model-form factor of a solved problem that is used
// for its own geometry.
const exactGeometryFactor = 1.15

// The outputs of the entries that return a complex factor Γ = Γr − iΓi.
var (
	outputGammaR = Output{ID: "gamma_r", Symbol: "Γr", Doc: "factor on the ideal added mass"}
	outputGammaI = Output{ID: "gamma_i", Symbol: "Γi", Doc: "damping constant over ω times the ideal added mass"}
)

// stillFluidPair and stillFluidOne turn functions of one argument into Eval.
func stillFluidPair(f func(float64) (float64, float64, error)) func([]float64) ([]float64, error) {
	return func(args []float64) ([]float64, error) {
		return stillFluidTwo(f(args[0]))
	}
}

func stillFluidPair2(f func(_, _ float64) (float64, float64, error)) func([]float64) ([]float64, error) {
	return func(args []float64) ([]float64, error) {
		return stillFluidTwo(f(args[0], args[1]))
	}
}

func stillFluidOne(f func(float64) (float64, error)) func([]float64) ([]float64, error) {
	return func(args []float64) ([]float64, error) {
		return stillFluidSingle(f(args[0]))
	}
}

func stillFluidTwo(a, b float64, err error) ([]float64, error) {
	if err != nil {
		return nil, err
	}
	return []float64{a, b}, nil
}

func stillFluidSingle(a float64, err error) ([]float64, error) {
	if err != nil {
		return nil, err
	}
	return []float64{a}, nil
}

// constant is a limit that depends on nothing.
func constant(x float64) func([]float64) float64 {
	return func([]float64) float64 { return x }
}

// orNone is a limit that is another solution: NaN where that has none.
func orNone(x float64, err error) float64 {
	if err != nil {
		return math.NaN()
	}
	return x
}

// creepingLogarithm is the real part of ln(z/2) + γ, z = √(iR), where the flow
// still creeps.
func creepingLogarithm(r float64) float64 {
	if r > 0.3 {
		return math.NaN()
	}
	return math.Log(math.Sqrt(r)/2) + eulerGamma
}

func stillFluidStokes(min, max float64) Arg {
	return Arg{Name: "R", Symbol: "R", Doc: "ωa²/ν: circular frequency times radius squared over kinematic viscosity", Min: min, Max: max}
}

// stillFluidEntries lists oscillation, sound and films in fluid at rest.
var stillFluidEntries = []*Entry{
	{
		Name:     "OscillatingCylinder",
		Problem:  "circular cylinder oscillating across its axis with a small amplitude in unbounded viscous fluid",
		Equation: "Γ = 1 + 4K₁(z)/(z K₀(z)), z = √(iR), R = ωa²/ν; ideal added mass ρπa² per length",
		Args:     []Arg{stillFluidStokes(oscillationMinR, oscillationMaxR)},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Stokes1851, cite.Rosenhead1963},
		Note:     "amplitude small against the radius and the flow laminar: no separation, no streaming",
		Limits: []Limit{
			{"creeping flow: 1 + π/(R(l² + π²/16)), l = ln(√R/2) + 0.5772", "gamma_r", Low, 1e-8, func(a []float64) float64 {
				l := creepingLogarithm(a[0])
				return 1 + math.Pi/(a[0]*(l*l+math.Pi*math.Pi/16))
			}},
			{"creeping flow: −4l/(R(l² + π²/16))", "gamma_i", Low, 1e-8, func(a []float64) float64 {
				l := creepingLogarithm(a[0])
				return -4 * l / (a[0] * (l*l + math.Pi*math.Pi/16))
			}},
			{"thin layer: 1 + 2δ/a", "gamma_r", High, 1e-12, func(a []float64) float64 { return 1 + 2*math.Sqrt(2/a[0]) }},
			{"thin layer: (2δ/a)(1 + δ/(2a))", "gamma_i", High, 1e-12, func(a []float64) float64 {
				layer := math.Sqrt(2 / a[0])
				return 2 * layer * (1 + layer/2)
			}},
		},
		Eval: stillFluidPair(OscillatingCylinder),
	},
	{
		Name:     "OscillatingSphere",
		Problem:  "sphere oscillating with a small amplitude in unbounded viscous fluid",
		Equation: "added mass/(ρV) = ½ + (9/4)δ/a, damping/(ωρV) = (9/4)(δ/a)(1 + δ/a), δ/a = √(2/R), R = ωa²/ν",
		Args:     []Arg{stillFluidStokes(oscillationMinR, oscillationMaxR)},
		Outputs: []Output{
			{ID: "added_mass", Symbol: "m_a/(ρV)", Doc: "added mass over displaced mass"},
			{ID: "damping", Symbol: "c/(ωρV)", Doc: "damping constant over ω times the displaced mass"},
		},
		Accuracy: 1e-14,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Stokes1851, cite.Landau1987},
		Note:     "per displaced mass: Γ on the ideal added mass ρV/2 is twice these",
		Limits: []Limit{
			{"creeping flow: (9/4)δ/a", "added_mass", Low, 1e-6, func(a []float64) float64 { return 2.25 * math.Sqrt(2/a[0]) }},
			{"creeping flow, 6πρνa: 9/(2R)", "damping", Low, 1e-5, func(a []float64) float64 { return 4.5 / a[0] }},
			{"ideal fluid: ½", "added_mass", High, 1e-8, constant(0.5)},
			{"thin layer: (9/4)δ/a", "damping", High, 1e-8, func(a []float64) float64 { return 2.25 * math.Sqrt(2/a[0]) }},
		},
		Eval: stillFluidPair(OscillatingSphere),
	},
	{
		Name:     "OscillatingRibbon",
		Problem:  "thin ribbon, or thin beam of rectangular section, oscillating across its faces in unbounded viscous fluid",
		Equation: "Γ = Ω*(R) Γc(R), R = ωb²/(4ν), Ω = Ωr + iΩi rational in log₁₀R, Γc that of the circular cylinder; ideal added mass ρπb²/4 per length",
		Args:     []Arg{{Name: "R", Symbol: "R", Doc: "ωb²/(4ν): circular frequency times half the width squared over kinematic viscosity", Min: ribbonMinR, Max: ribbonMaxR}},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-3,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Sader1998, cite.Tuck1969},
		Note:     "two-dimensional flow: the wave length of the mode is long against the width; the fit lies within 0.1 % of the numerical solution",
		Limits: []Limit{
			{"ideal fluid: 1", "gamma_r", High, 0.05, constant(1)},
		},
		Eval: stillFluidPair(OscillatingRibbon),
	},
	{
		Name:     "CylinderInShell",
		Problem:  "circular cylinder oscillating across its axis with a small amplitude in viscous fluid inside a fixed concentric shell",
		Equation: "Γ = 2A₂/(Ua²) − 1 from ψ = (A₁r + A₂/r + A₃I₁(λr) + A₄K₁(λr)) sin θ, λ² = iω/ν, no slip on both walls; Γ on the ideal added mass ρπa² of the free cylinder",
		Args: []Arg{
			stillFluidStokes(shellMinR, shellMaxR),
			{Name: "q", Symbol: "q", Doc: "radius of the shell over radius of the cylinder", Min: shellMinRatio, Max: shellMaxRatio, Typical: 1.5},
		},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-9,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Chen1976, cite.Fritz1972},
		Note:     "amplitude small against the gap; two-dimensional: the fluid does not escape along the axis, for which the length is large against the radius",
		Limits: []Limit{
			{"creeping flow: 4/(R(ln q − (q²−1)/(q²+1)))", "gamma_i", Low, 1e-8, func(a []float64) float64 {
				q2 := a[1] * a[1]
				return 4 / (a[0] * (math.Log(a[1]) - (q2-1)/(q2+1)))
			}},
			{"ideal fluid: (q²+1)/(q²−1)", "gamma_r", High, 1e-6, func(a []float64) float64 {
				q2 := a[1] * a[1]
				return (q2 + 1) / (q2 - 1)
			}},
		},
		Eval: stillFluidPair2(CylinderInShell),
	},
	{
		Name:     "CylinderNearWall",
		Problem:  "circular cylinder oscillating across its axis close to a plane wall in ideal fluid at rest",
		Equation: "C = 1 + 2Σsᵢ, sᵢ₊₁ = sᵢ/dᵢ², dᵢ₊₁ = 2(1 + 2e) − 1/dᵢ; added mass C ρπD²/4 per length",
		Args:     []Arg{{Name: "e", Symbol: "e", Doc: "gap between cylinder and wall over diameter", Min: 0, Max: imagesMaxGap, From: 1e-4, To: 10}},
		Outputs:  []Output{{ID: "coefficient", Symbol: "C", Doc: "added mass over displaced mass"}},
		Accuracy: 1e-13,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.LambImages1932},
		Note:     "the same along and across the wall; no viscous film, which counts where the gap is not large against √(2ν/ω)",
		Limits: []Limit{
			{"touching: π²/3 − 1", "coefficient", Low, 1e-12, constant(math.Pi*math.Pi/3 - 1)},
			{"far from the wall: 1", "coefficient", High, 1e-12, constant(1)},
		},
		Eval: stillFluidOne(CylinderNearWall),
	},
	{
		Name:     "CylinderBelowSurface",
		Problem:  "circular cylinder oscillating across its axis below a free surface in ideal fluid at rest, slow or fast",
		Equation: "rigid lid: C = 1 + 2Σsᵢ; pressure-free: C = 1 + 2Σ(−1)ⁱsᵢ; sᵢ as near a wall with d for e; added mass C ρπD²/4 per length",
		Args: []Arg{
			{Name: "d", Symbol: "d", Doc: "distance from the surface to the top of the cylinder over diameter", Min: 0, Max: imagesMaxGap, From: 1e-4, To: 10},
			{Name: "kind", Symbol: "kind", Doc: "rigid-lid for ω²d/g ≪ 1, pressure-free for ω²d/g ≫ 1", Choices: []string{RigidLid.String(), PressureFree.String()}},
		},
		Outputs:  []Output{{ID: "coefficient", Symbol: "C", Doc: "added mass over displaced mass"}},
		Accuracy: 1e-13,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.LambImages1932},
		Note:     "the limits of low and high frequency; between them the cylinder makes waves, and these make damping",
		Limits: []Limit{
			{"touching: π²/3 − 1 under a lid, π²/6 − 1 under a free surface", "coefficient", Low, 1e-12, func(a []float64) float64 {
				if SurfaceKind(a[1]) == PressureFree {
					return math.Pi*math.Pi/6 - 1
				}
				return math.Pi*math.Pi/3 - 1
			}},
			{"deep: 1", "coefficient", High, 1e-12, constant(1)},
		},
		Eval: func(args []float64) ([]float64, error) {
			return stillFluidSingle(CylinderBelowSurface(args[0], SurfaceKind(args[1])))
		},
	},
	{
		Name:     "SoundCylinder",
		Problem:  "circular cylinder oscillating across its axis in a compressible fluid without viscosity",
		Equation: "Γ = −H₁⁽²⁾(x)/(x H₁⁽²⁾′(x)), x = ka; ideal added mass ρπa² per length",
		Args:     []Arg{{Name: "x", Symbol: "ka", Doc: "wave number of sound times radius", Min: 0, Max: soundMaxX, From: 0.01, To: 100}},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.JungerFeit1986},
		Note:     "moves in phase along its axis",
		Limits: []Limit{
			{"incompressible: 1", "gamma_r", Low, 1e-12, constant(1)},
			{"long waves: πx²/2", "gamma_i", Low, 1e-12, func(a []float64) float64 { return math.Pi / 2 * a[0] * a[0] }},
			{"short waves: 1/(2x²)", "gamma_r", High, 1e-8, func(a []float64) float64 { return 1 / (2 * a[0] * a[0]) }},
			{"plane wave: 1/x", "gamma_i", High, 1e-8, func(a []float64) float64 { return 1 / a[0] }},
		},
		Eval: stillFluidPair(SoundCylinder),
	},
	{
		Name:     "SoundSphere",
		Problem:  "sphere oscillating in a compressible fluid without viscosity",
		Equation: "Γ = −2h₁⁽²⁾(x)/(x h₁⁽²⁾′(x)) = [2(2 + x²) − 2ix³]/(4 + x⁴), x = ka; ideal added mass half the displaced",
		Args:     []Arg{{Name: "x", Symbol: "ka", Doc: "wave number of sound times radius", Min: 0, Max: soundMaxX, From: 0.01, To: 100}},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-14,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.JungerFeit1986},
		Limits: []Limit{
			{"incompressible: 1", "gamma_r", Low, 1e-12, constant(1)},
			{"long waves: x³/2", "gamma_i", Low, 1e-12, func(a []float64) float64 { return a[0] * a[0] * a[0] / 2 }},
			{"short waves: 2/x²", "gamma_r", High, 1e-8, func(a []float64) float64 { return 2 / (a[0] * a[0]) }},
			{"plane wave: 2/x", "gamma_i", High, 1e-8, func(a []float64) float64 { return 2 / a[0] }},
		},
		Eval: stillFluidPair(SoundSphere),
	},
	{
		Name:     "BaffledPiston",
		Problem:  "rigid circular piston oscillating in a rigid plane, radiating sound on one side",
		Equation: "R₁ = 1 − 2J₁(2x)/(2x), X₁ = 2H₁(2x)/(2x) with Struve's H₁, x = ka; impedance ρcπa²(R₁ + iX₁)",
		Args:     []Arg{{Name: "x", Symbol: "ka", Doc: "wave number of sound times radius", Min: 0, Max: soundMaxX, From: 0.01, To: 100}},
		Outputs: []Output{
			{ID: "resistance", Symbol: "R₁", Doc: "radiation resistance over ρcπa²"},
			{ID: "reactance", Symbol: "X₁", Doc: "radiation reactance over ρcπa²; the added mass is ρcπa²X₁/ω"},
		},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Rayleigh1896, cite.KinslerPiston2000, cite.AbramowitzStegun1964},
		Note:     "one face; a rigid baffle much wider than a wave length",
		Limits: []Limit{
			{"long waves: x²/2", "resistance", Low, 1e-12, func(a []float64) float64 { return a[0] * a[0] / 2 }},
			{"long waves: 8x/(3π)", "reactance", Low, 1e-12, func(a []float64) float64 { return 8 * a[0] / (3 * math.Pi) }},
			{"plane wave: 1", "resistance", High, 1e-8, constant(1)},
			{"short waves: 2/(πx)", "reactance", High, 1e-4, func(a []float64) float64 { return 2 / (math.Pi * a[0]) }},
		},
		Eval: stillFluidPair(BaffledPiston),
	},
	{
		Name:     "FlexuralWaveLoading",
		Problem:  "flexural wave in an infinite plate, a compressible fluid on one face",
		Equation: "s < 1: added mass per area (ρ/k_b)/√(1 − s²); s ≥ 1: resistance per area ρc/√(1 − 1/s²); s = k₀/k_b, |1 − s²| not below min(1, π/(k_b L))",
		Args: []Arg{
			{Name: "s", Symbol: "s", Doc: "wave number of sound over that of the flexural wave", Min: 0, Max: 1e8, From: 0, To: 3, Typical: 2},
			{Name: "kbL", Symbol: "k_b L", Doc: "flexural wave number times the length of the plate, which sets the floor at coincidence", Min: 1e-3, Max: 1e12, Typical: 100},
		},
		Outputs: []Output{
			{ID: "added_mass", Symbol: "m_a k_b/ρ", Doc: "added mass per area over ρ/k_b"},
			{ID: "resistance", Symbol: "r/(ρc)", Doc: "resistance per area over ρc"},
		},
		Accuracy: 1e-14,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.JungerFeit1986, cite.CremerHeckl2005},
		Note:     "one face; a plate of finite length also radiates at its edges below coincidence, which is left out",
		Limits: []Limit{
			{"incompressible: ρ/k_b", "added_mass", Low, 1e-12, constant(1)},
			{"plane wave: ρc", "resistance", High, 1e-12, constant(1)},
		},
		Eval: stillFluidPair2(FlexuralWaveLoading),
	},
	{
		Name:     "ThinFilm",
		Problem:  "gas film between parallel rectangular plates that approach and part with a small amplitude, edges open",
		Equation: "k + iωc = (p_a A/h)(64/π⁴) Σ_{m,n odd} iσ/(m²n²(π²(m² + β²n²) + iσ)), σ = 12ηωL²/(p_a h²), β = L/W",
		Args: []Arg{
			{Name: "sigma", Symbol: "σ", Doc: "squeeze number 12ηωL²/(p_a h²), η the dynamic viscosity", Min: 0, Max: filmMaxSigma, From: 0.1, To: 1e5},
			{Name: "aspect", Symbol: "β", Doc: "the side L of σ over the other side; 0 for a strip", Min: 0, Max: filmMaxAspect, Typical: 1},
		},
		Outputs: []Output{
			{ID: "spring", Symbol: "k h/(p_a A)", Doc: "stiffness over p_a A/h"},
			{ID: "damping", Symbol: "ωc h/(p_a A)", Doc: "damping constant times ω over p_a A/h"},
			{ID: UncertaintyID, Symbol: "δ", Doc: "relative change of either that what the series leaves out may make"},
		},
		Accuracy: 1e-9,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Langlois1962, cite.Blech1983},
		Note:     "isothermal; no inertia (ωh²/ν ≪ 1), no flow round the edges (h ≪ L, W); rarefied gas by VeijolaViscosity, a liquid by ThinFilmLiquid",
		Limits: []Limit{
			{"liquid: (σ/12) ThinFilmLiquid(β)", "damping", Low, 1e-12, func(a []float64) float64 {
				liquid, err := ThinFilmLiquid(a[1])
				return orNone(a[0]/12*liquid, err)
			}},
			{"closed gas: 1", "spring", High, 1e-5, constant(1)},
			{"edge layers: √2(1 + β)/√σ", "damping", High, 1e-5, func(a []float64) float64 { return math.Sqrt2 * (1 + a[1]) / math.Sqrt(a[0]) }},
		},
		Eval: func(args []float64) ([]float64, error) {
			spring, damping, err := ThinFilm(args[0], args[1])
			if err != nil {
				return nil, err
			}
			return []float64{spring, damping, thinFilmUncertainty(args[0], args[1])}, nil
		},
	},
	{
		Name:     "ThinFilmLiquid",
		Problem:  "liquid film between parallel rectangular plates that approach and part, edges open",
		Equation: "c = (ηL²A/h³)[1 − (192β/π⁵) Σ_{m odd} tanh(πm/(2β))/m⁵], β = L/W",
		Args:     []Arg{{Name: "aspect", Symbol: "β", Doc: "the side L over the other side; 0 for a strip", Min: 0, Max: filmMaxAspect, From: 0.01, To: 100}},
		Outputs:  []Output{{ID: "damping", Symbol: "c h³/(ηL²A)", Doc: "damping constant over ηL²A/h³"}, uncertaintyOutput},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Langlois1962},
		Note:     "no inertia (ωh²/ν ≪ 1), no cavitation, no flow round the edges (h ≪ L, W)",
		Limits: []Limit{
			{"strip across L: 1", "damping", Low, 1e-12, constant(1)},
			{"strip across W: 1/β²", "damping", High, 1e-5, func(a []float64) float64 { return 1 / (a[0] * a[0]) }},
		},
		Eval: func(args []float64) ([]float64, error) {
			damping, err := ThinFilmLiquid(args[0])
			return []float64{damping, filmLiquidLeftOut}, err
		},
	},
	{
		Name:     "VeijolaViscosity",
		Problem:  "viscosity that a rarefied gas shows in a narrow gap",
		Equation: "η_eff/η = 1/(1 + 9.638 Kn^1.159), Kn the mean free path over the gap",
		Args:     []Arg{{Name: "Kn", Symbol: "Kn", Doc: "mean free path over gap", Min: 0, Max: 880, From: 1e-3, To: 880}},
		Outputs:  []Output{{ID: "ratio", Symbol: "η_eff/η", Doc: "effective over actual viscosity"}},
		Accuracy: 0.05,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Veijola1995},
		Note:     "a fit for flow between parallel plates with diffuse reflection; the ends of the gap are left out",
		Limits: []Limit{
			{"continuum: 1", "ratio", Low, 1e-12, constant(1)},
			{"free molecules: 1/(9.638 Kn^1.159)", "ratio", High, 1e-4, func(a []float64) float64 { return 1 / (9.638 * math.Pow(a[0], 1.159)) }},
		},
		Eval: stillFluidOne(VeijolaViscosity),
	},
	{
		Name:     "PulsatileTube",
		Problem:  "pulsating flow of a viscous fluid in a rigid circular tube",
		Equation: "1 − F₁₀, F₁₀ = 2J₁(z)/(z J₀(z)), z = i^{3/2}α, α = a√(ω/ν); mean velocity = (1 − F₁₀)/(iωρ) times minus the pressure gradient",
		Args:     []Arg{{Name: "alpha", Symbol: "α", Doc: "inner radius times √(ω/ν)", Min: 0, Max: 1e8, From: 0.1, To: 1000}},
		Outputs: []Output{
			{ID: "re", Symbol: "Re(1−F₁₀)", Doc: "real part"},
			{ID: "im", Symbol: "Im(1−F₁₀)", Doc: "imaginary part, for e^{+iωt}"},
		},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Womersley1955},
		Note:     "rigid wall, long tube; the wall of a vessel enters through the wave speed",
		Limits: []Limit{
			{"slow: α⁴/48", "re", Low, 1e-12, func(a []float64) float64 { return math.Pow(a[0], 4) / 48 }},
			{"slow, Poiseuille: α²/8", "im", Low, 1e-12, func(a []float64) float64 { return a[0] * a[0] / 8 }},
			{"fast: 1 − √2/α", "re", High, 1e-12, func(a []float64) float64 { return 1 - math.Sqrt2/a[0] }},
			{"fast: √2/α", "im", High, 1e-7, func(a []float64) float64 { return math.Sqrt2 / a[0] }},
		},
		Eval: stillFluidPair(PulsatileTube),
	},
}
