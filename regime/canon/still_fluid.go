package canon

import "regimed/regime/cite"

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
		Eval:     stillFluidPair(OscillatingCylinder),
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
		Eval:     stillFluidPair(OscillatingSphere),
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
		Eval:     stillFluidPair(OscillatingRibbon),
	},
	{
		Name:     "CylinderInShell",
		Problem:  "circular cylinder oscillating across its axis with a small amplitude in viscous fluid inside a fixed concentric shell",
		Equation: "Γ = 2A₂/(Ua²) − 1 from ψ = (A₁r + A₂/r + A₃I₁(λr) + A₄K₁(λr)) sin θ, λ² = iω/ν, no slip on both walls; Γ on the ideal added mass ρπa² of the free cylinder",
		Args: []Arg{
			stillFluidStokes(shellMinR, shellMaxR),
			{Name: "q", Symbol: "q", Doc: "radius of the shell over radius of the cylinder", Min: shellMinRatio, Max: shellMaxRatio},
		},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-9,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Chen1976, cite.Fritz1972},
		Note:     "amplitude small against the gap; two-dimensional: the fluid does not escape along the axis, for which the length is large against the radius",
		Eval:     stillFluidPair2(CylinderInShell),
	},
	{
		Name:     "CylinderNearWall",
		Problem:  "circular cylinder oscillating across its axis close to a plane wall in ideal fluid at rest",
		Equation: "C = 1 + 2Σsᵢ, sᵢ₊₁ = sᵢ/dᵢ², dᵢ₊₁ = 2(1 + 2e) − 1/dᵢ; added mass C ρπD²/4 per length",
		Args:     []Arg{{Name: "e", Symbol: "e", Doc: "gap between cylinder and wall over diameter", Min: 0, Max: imagesMaxGap}},
		Outputs:  []Output{{ID: "coefficient", Symbol: "C", Doc: "added mass over displaced mass"}},
		Accuracy: 1e-13,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.LambImages1932},
		Note:     "the same along and across the wall; no viscous film, which counts where the gap is not large against √(2ν/ω)",
		Eval:     stillFluidOne(CylinderNearWall),
	},
	{
		Name:     "CylinderBelowSurface",
		Problem:  "circular cylinder oscillating across its axis below a free surface in ideal fluid at rest, slow or fast",
		Equation: "rigid lid: C = 1 + 2Σsᵢ; pressure-free: C = 1 + 2Σ(−1)ⁱsᵢ; sᵢ as near a wall with d for e; added mass C ρπD²/4 per length",
		Args: []Arg{
			{Name: "d", Symbol: "d", Doc: "distance from the surface to the top of the cylinder over diameter", Min: 0, Max: imagesMaxGap},
			{Name: "kind", Symbol: "kind", Doc: "rigid-lid for ω²d/g ≪ 1, pressure-free for ω²d/g ≫ 1", Choices: []string{RigidLid.String(), PressureFree.String()}},
		},
		Outputs:  []Output{{ID: "coefficient", Symbol: "C", Doc: "added mass over displaced mass"}},
		Accuracy: 1e-13,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.LambImages1932},
		Note:     "the limits of low and high frequency; between them the cylinder makes waves, and these make damping",
		Eval: func(args []float64) ([]float64, error) {
			return stillFluidSingle(CylinderBelowSurface(args[0], SurfaceKind(args[1])))
		},
	},
	{
		Name:     "SoundCylinder",
		Problem:  "circular cylinder oscillating across its axis in a compressible fluid without viscosity",
		Equation: "Γ = −H₁⁽²⁾(x)/(x H₁⁽²⁾′(x)), x = ka; ideal added mass ρπa² per length",
		Args:     []Arg{{Name: "x", Symbol: "ka", Doc: "wave number of sound times radius", Min: 0, Max: soundMaxX}},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.JungerFeit1986},
		Note:     "moves in phase along its axis",
		Eval:     stillFluidPair(SoundCylinder),
	},
	{
		Name:     "SoundSphere",
		Problem:  "sphere oscillating in a compressible fluid without viscosity",
		Equation: "Γ = −2h₁⁽²⁾(x)/(x h₁⁽²⁾′(x)) = [2(2 + x²) − 2ix³]/(4 + x⁴), x = ka; ideal added mass half the displaced",
		Args:     []Arg{{Name: "x", Symbol: "ka", Doc: "wave number of sound times radius", Min: 0, Max: soundMaxX}},
		Outputs:  []Output{outputGammaR, outputGammaI},
		Accuracy: 1e-14,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.JungerFeit1986},
		Eval:     stillFluidPair(SoundSphere),
	},
	{
		Name:     "BaffledPiston",
		Problem:  "rigid circular piston oscillating in a rigid plane, radiating sound on one side",
		Equation: "R₁ = 1 − 2J₁(2x)/(2x), X₁ = 2H₁(2x)/(2x) with Struve's H₁, x = ka; impedance ρcπa²(R₁ + iX₁)",
		Args:     []Arg{{Name: "x", Symbol: "ka", Doc: "wave number of sound times radius", Min: 0, Max: soundMaxX}},
		Outputs: []Output{
			{ID: "resistance", Symbol: "R₁", Doc: "radiation resistance over ρcπa²"},
			{ID: "reactance", Symbol: "X₁", Doc: "radiation reactance over ρcπa²; the added mass is ρcπa²X₁/ω"},
		},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Rayleigh1896, cite.KinslerPiston2000, cite.AbramowitzStegun1964},
		Note:     "one face; a rigid baffle much wider than a wave length",
		Eval:     stillFluidPair(BaffledPiston),
	},
	{
		Name:     "FlexuralWaveLoading",
		Problem:  "flexural wave in an infinite plate, a compressible fluid on one face",
		Equation: "s < 1: added mass per area (ρ/k_b)/√(1 − s²); s ≥ 1: resistance per area ρc/√(1 − 1/s²); s = k₀/k_b, |1 − s²| not below min(1, π/(k_b L))",
		Args: []Arg{
			{Name: "s", Symbol: "s", Doc: "wave number of sound over that of the flexural wave", Min: 0, Max: 1e8},
			{Name: "kbL", Symbol: "k_b L", Doc: "flexural wave number times the length of the plate, which sets the floor at coincidence", Min: 1e-3, Max: 1e12},
		},
		Outputs: []Output{
			{ID: "added_mass", Symbol: "m_a k_b/ρ", Doc: "added mass per area over ρ/k_b"},
			{ID: "resistance", Symbol: "r/(ρc)", Doc: "resistance per area over ρc"},
		},
		Accuracy: 1e-14,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.JungerFeit1986, cite.CremerHeckl2005},
		Note:     "one face; a plate of finite length also radiates at its edges below coincidence, which is left out",
		Eval:     stillFluidPair2(FlexuralWaveLoading),
	},
	{
		Name:     "ThinFilm",
		Problem:  "gas film between parallel rectangular plates that approach and part with a small amplitude, edges open",
		Equation: "k + iωc = (p_a A/h)(64/π⁴) Σ_{m,n odd} iσ/(m²n²(π²(m² + β²n²) + iσ)), σ = 12ηωL²/(p_a h²), β = L/W",
		Args: []Arg{
			{Name: "sigma", Symbol: "σ", Doc: "squeeze number 12ηωL²/(p_a h²), η the dynamic viscosity", Min: 0, Max: filmMaxSigma},
			{Name: "aspect", Symbol: "β", Doc: "the side L of σ over the other side; 0 for a strip", Min: 0, Max: filmMaxAspect},
		},
		Outputs: []Output{
			{ID: "spring", Symbol: "k h/(p_a A)", Doc: "stiffness over p_a A/h"},
			{ID: "damping", Symbol: "ωc h/(p_a A)", Doc: "damping constant times ω over p_a A/h"},
		},
		Accuracy: 1e-9,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Langlois1962, cite.Blech1983},
		Note:     "isothermal; no inertia (ωh²/ν ≪ 1), no flow round the edges (h ≪ L, W); rarefied gas by VeijolaViscosity, a liquid by ThinFilmLiquid",
		Eval:     stillFluidPair2(ThinFilm),
	},
	{
		Name:     "ThinFilmLiquid",
		Problem:  "liquid film between parallel rectangular plates that approach and part, edges open",
		Equation: "c = (ηL²A/h³)[1 − (192β/π⁵) Σ_{m odd} tanh(πm/(2β))/m⁵], β = L/W",
		Args:     []Arg{{Name: "aspect", Symbol: "β", Doc: "the side L over the other side; 0 for a strip", Min: 0, Max: filmMaxAspect}},
		Outputs:  []Output{{ID: "damping", Symbol: "c h³/(ηL²A)", Doc: "damping constant over ηL²A/h³"}},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Langlois1962},
		Note:     "no inertia (ωh²/ν ≪ 1), no cavitation, no flow round the edges (h ≪ L, W)",
		Eval:     stillFluidOne(ThinFilmLiquid),
	},
	{
		Name:     "VeijolaViscosity",
		Problem:  "viscosity that a rarefied gas shows in a narrow gap",
		Equation: "η_eff/η = 1/(1 + 9.638 Kn^1.159), Kn the mean free path over the gap",
		Args:     []Arg{{Name: "Kn", Symbol: "Kn", Doc: "mean free path over gap", Min: 0, Max: 880}},
		Outputs:  []Output{{ID: "ratio", Symbol: "η_eff/η", Doc: "effective over actual viscosity"}},
		Accuracy: 0.05,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Veijola1995},
		Note:     "a fit for flow between parallel plates with diffuse reflection; the ends of the gap are left out",
		Eval:     stillFluidOne(VeijolaViscosity),
	},
	{
		Name:     "PulsatileTube",
		Problem:  "pulsating flow of a viscous fluid in a rigid circular tube",
		Equation: "1 − F₁₀, F₁₀ = 2J₁(z)/(z J₀(z)), z = i^{3/2}α, α = a√(ω/ν); mean velocity = (1 − F₁₀)/(iωρ) times minus the pressure gradient",
		Args:     []Arg{{Name: "alpha", Symbol: "α", Doc: "inner radius times √(ω/ν)", Min: 0, Max: 1e8}},
		Outputs: []Output{
			{ID: "re", Symbol: "Re(1−F₁₀)", Doc: "real part"},
			{ID: "im", Symbol: "Im(1−F₁₀)", Doc: "imaginary part, for e^{+iωt}"},
		},
		Accuracy: 1e-12,
		Factor:   exactGeometryFactor,
		Sources:  []*cite.Source{cite.Womersley1955},
		Note:     "rigid wall, long tube; the wall of a vessel enters through the wave speed",
		Eval:     stillFluidPair(PulsatileTube),
	},
}
