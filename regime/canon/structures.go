package canon

import (
	"math"
	"strings"

	"regimed/regime/cite"
)

// structureEntries are the canonical solutions on beams, plates, rings and cables
// and on the loading of plates by a fluid.
var structureEntries = []*Entry{
	beamModeEntry, beamShapeEntry, beamModeFactorsEntry, elasticBeamModeEntry, tensionedBeamEntry,
	plateModeEntry, circularPlateModeEntry, elasticCircularPlateModeEntry, largeAmplitudeEntry,
	circularPlateAddedMassEntry, baffledCircularPlateModeEntry, baffledPlateModeEntry, cavityStiffnessEntry,
	stringModeEntry, ringModeEntry, breathingTubeEntry,
}

// oneValue turns a result and its error into what Eval returns.
func oneValue(x float64, err error) ([]float64, error) {
	if err != nil {
		return nil, err
	}
	return []float64{x}, nil
}

// twoValues is oneValue for two results.
func twoValues(x, y float64, err error) ([]float64, error) {
	if err != nil {
		return nil, err
	}
	return []float64{x, y}, nil
}

// withTypical sets the usual value of an argument.
func withTypical(a Arg, typical float64) Arg {
	a.Typical = typical
	return a
}

func supportArg(name, doc string) Arg {
	return Arg{Name: name, Doc: doc, Choices: beamSupportNames}
}

func beamModeNumber(limit float64) Arg {
	return Arg{Name: "n", Symbol: "n", Doc: "mode number, from the lowest", Min: 1, Max: limit, Whole: true}
}

func poissonArg() Arg {
	return Arg{Name: "nu", Symbol: "ν", Doc: "Poisson's ratio", Min: 0, Max: 0.5, Optional: true, Default: 0.3}
}

func aspectArg() Arg {
	return Arg{Name: "aspect", Symbol: "a/b", Doc: "side along x over side along y", Min: 0.1, Max: 10, Typical: 1}
}

// discArgs are the arguments of a mode of a circular plate, with the usual edge.
func discArgs(edge float64) []Arg {
	return []Arg{
		{Name: "edge", Doc: "how the edge is held", Choices: circularEdgeNames, Typical: edge},
		{Name: "circles", Symbol: "n", Doc: "nodal circles within the edge", Min: 0, Max: discModeLimit, Whole: true},
		{Name: "diameters", Symbol: "s", Doc: "nodal diameters", Min: 0, Max: discModeLimit, Whole: true, Optional: true},
		poissonArg(),
	}
}

func plateHalfWaves() []Arg {
	return []Arg{
		{Name: "m", Symbol: "m", Doc: "half waves along x", Min: 1, Max: plateModeLimit, Whole: true},
		{Name: "n", Symbol: "n", Doc: "half waves along y", Min: 1, Max: plateModeLimit, Whole: true},
	}
}

var beamModeEntry = &Entry{
	Name:     "BeamMode",
	Problem:  "bending modes of a uniform beam, with or without a mass at its free end",
	Equation: "ω = β²√(EI/(mL⁴)); sin β = 0; cos β cosh β = ∓1; tan β = tanh β",
	Args: []Arg{
		withTypical(supportArg("support", "supports of the two ends"), float64(ClampedFree)), beamModeNumber(beamModeLimit),
		{Name: "tipMassRatio", Symbol: "M", Doc: "mass at the free end over the mass of the beam", Min: 0, Max: beamTipMassLimit, Optional: true, From: 0.01, To: 100},
	},
	Outputs:  []Output{{ID: "beta", Symbol: "β", Doc: "wave number times length"}},
	Accuracy: 1e-12, Factor: 1.05,
	Sources: []*cite.Source{cite.Blevins1979},
	Note:    "Euler–Bernoulli: no shear, no rotary inertia; the tip mass is a point. Free-free: the first mode is the first that bends.",
	Limits: []Limit{
		{"no mass at the end", "beta", Low, 1e-12, func(v []float64) float64 { return beamRoot(BeamSupport(v[0]), int(v[1])) }},
		{"heavy mass, first mode of the cantilever: β⁴ = 3/(M + 33/140)", "beta", High, 1e-6, func(v []float64) float64 {
			if BeamSupport(v[0]) != ClampedFree || v[1] != 1 {
				return math.NaN()
			}
			return math.Pow(3/(v[2]+33.0/140), 0.25)
		}},
	},
	Eval: func(v []float64) ([]float64, error) {
		support, n := BeamSupport(v[0]), int(v[1])
		return oneValue(BeamMode(support, n, v[2]))
	},
}

var beamShapeEntry = &Entry{
	Name:     "BeamShape",
	Problem:  "shape of a bending mode of a uniform beam",
	Equation: "w⁗ = β⁴w with the end conditions, max |w| = 1",
	Args: []Arg{
		withTypical(supportArg("support", "supports of the two ends"), float64(ClampedFree)), beamModeNumber(beamModeLimit),
		{Name: "x", Symbol: "x/L", Doc: "distance from the first end over the length", Min: 0, Max: 1},
	},
	Outputs:  []Output{{ID: "shape", Symbol: "w", Doc: "deflection over the largest deflection"}},
	Accuracy: 1e-10, Factor: 1.05,
	Sources: []*cite.Source{cite.Blevins1979},
	Eval: func(v []float64) ([]float64, error) {
		support, n := BeamSupport(v[0]), int(v[1])
		return oneValue(BeamShape(support, n, v[2]))
	},
}

var beamModeFactorsEntry = &Entry{
	Name:     "BeamModeFactors",
	Problem:  "averages and extremes of the shape of a bending mode",
	Equation: "∫w dx, ∫w² dx, ∫w′² dx, max |w′|, max |w″| with max |w| = 1 and x from 0 to 1",
	Args:     []Arg{withTypical(supportArg("support", "supports of the two ends"), float64(ClampedFree)), beamModeNumber(beamModeLimit)},
	Outputs: []Output{
		{ID: "mean", Symbol: "∫w", Doc: "mean deflection, positive in the first lobe"},
		{ID: "mean_square", Symbol: "∫w²", Doc: "mean square deflection"},
		{ID: "mean_square_slope", Symbol: "∫w′²", Doc: "mean square slope times length squared"},
		{ID: "max_slope", Symbol: "max|w′|", Doc: "largest slope times length"},
		{ID: "max_curvature", Symbol: "max|w″|", Doc: "largest curvature times length squared"},
	},
	Accuracy: 1e-9, Factor: 1.05,
	Sources: []*cite.Source{cite.Blevins1979},
	Eval: func(v []float64) ([]float64, error) {
		support, n := BeamSupport(v[0]), int(v[1])
		f, err := BeamModeFactors(support, n)
		if err != nil {
			return nil, err
		}
		return []float64{f.Mean, f.MeanSquare, f.MeanSquareSlope, f.MaxSlope, f.MaxCurvature}, nil
	},
}

// beamEndArgs are the arguments of an end, with the usual stiffness of its springs.
func beamEndArgs(side string, typical float64) []Arg {
	return []Arg{
		{Name: side + "Translation", Symbol: "kL³/EI", Doc: "spring across the " + side + " end; 1e12: held", Min: 0, Max: rigidSpring, Typical: typical, From: 0.01, To: 1e6},
		{Name: side + "Rotation", Symbol: "kθL/EI", Doc: "rotational spring at the " + side + " end; 1e12: held", Min: 0, Max: rigidSpring, Typical: typical, From: 0.01, To: 1e6},
		{Name: side + "Mass", Symbol: "M", Doc: "mass at the " + side + " end over the mass of the beam", Min: 0, Max: beamTipMassLimit, From: 0, To: 5},
	}
}

var elasticBeamModeEntry = &Entry{
	Name:     "ElasticBeamMode",
	Problem:  "bending modes of a uniform beam on elastic ends with end masses",
	Equation: "ω = β²√(EI/(mL⁴)); det[K(β) + springs − masses β⁴] = 0",
	Args:     append(append(beamEndArgs("left", rigidSpring), beamEndArgs("right", 1e-6)...), beamModeNumber(elasticBeamModeLimit)),
	Outputs:  []Output{{ID: "beta", Symbol: "β", Doc: "wave number times length"}},
	Accuracy: 1e-8, Factor: 1.1,
	Sources: []*cite.Source{cite.WittrickWilliams1971, cite.Blevins1979},
	Note:    "A relative stiffness is 0 or at least 1e-6. Motions of zero frequency are not counted.",
	Limits: []Limit{
		{"held: the end does not move", "beta", High, 1e-8, func(v []float64) float64 {
			return orNone(ElasticBeamMode(BeamEnd{rigidSpring, v[1], v[2]}, BeamEnd{v[3], v[4], v[5]}, int(v[6])))
		}},
	},
	Eval: func(v []float64) ([]float64, error) {
		n := int(v[6])
		return oneValue(ElasticBeamMode(BeamEnd{v[0], v[1], v[2]}, BeamEnd{v[3], v[4], v[5]}, n))
	},
}

var tensionedBeamEntry = &Entry{
	Name:     "TensionedBeam",
	Problem:  "effect of axial tension or compression on the natural frequency of a beam",
	Equation: "pinned-pinned ω/ω₀ = √(1 + τ/(n²π²)), τ = TL²/EI; others by the boundary determinant",
	Args: []Arg{
		{Name: "support", Doc: "supports of the two ends", Choices: beamSupportNames[:FreeFree]}, beamModeNumber(elasticBeamModeLimit),
		{Name: "tension", Symbol: "τ", Doc: "TL²/EI, negative in compression", Min: -4 * math.Pi * math.Pi, Max: tensionLimit, From: -20, To: 200},
	},
	Outputs:  []Output{{ID: "frequency_ratio", Symbol: "ω/ω₀", Doc: "frequency over that without tension"}},
	Accuracy: 1e-8, Factor: 1.05,
	Sources: []*cite.Source{cite.Bokaian1990, cite.WittrickWilliams1971},
	Note:    "Compression to 0.999 of the buckling load of the supports. The force keeps its direction at a free end.",
	Limits: []Limit{
		{"taut string: ω = nπ√τ", "frequency_ratio", High, 0.03, func(v []float64) float64 {
			β := beamRoot(BeamSupport(v[0]), int(v[1]))
			return v[1] * math.Pi * math.Sqrt(v[2]) / (β * β)
		}},
	},
	Eval: func(v []float64) ([]float64, error) {
		support, n := BeamSupport(v[0]), int(v[1])
		return oneValue(TensionedBeam(support, n, v[2]))
	},
}

// plateEdgeNames are the 81 combinations of edges, SSSS first.
var plateEdgeNames = allPlateEdges()

func allPlateEdges() []string {
	const letters = "SCF"
	names := make([]string, 0, 81)
	for i := range 81 {
		names = append(names, string([]byte{letters[i/27], letters[i/9%3], letters[i/3%3], letters[i%3]}))
	}
	return names
}

var plateModeEntry = &Entry{
	Name:     "PlateMode",
	Problem:  "modes of a thin rectangular plate with any edges",
	Equation: "λ² = ωa²√(ρh/D); SSSS: π²(m² + n²a²/b²); otherwise Rayleigh–Ritz",
	Args: append(append([]Arg{
		{Name: "edges", Doc: "edges at x = 0, y = 0, x = a, y = b: C clamped, S simply supported, F free", Choices: plateEdgeNames, Typical: 40},
		aspectArg(),
	}, plateHalfWaves()...), poissonArg()),
	Outputs: []Output{
		{ID: "lambda2", Symbol: "λ²", Doc: "frequency parameter, on the side a"},
		{ID: UncertaintyID, Symbol: "δ", Doc: "relative change that further polynomials may make, downward"},
	},
	Accuracy: 5e-3, Factor: 1.05,
	Sources: []*cite.Source{cite.Leissa1969, cite.Leissa1973, cite.Bhat1985},
	Note:    "With a free edge and no opposite edges simply supported, m ranks the modes and n is 1. The accuracy is that of the worst corner of the range; the uncertainty returned is mostly far smaller.",
	Limits: []Limit{
		{"long along y, held edges: a beam along x, β_x²", "lambda2", Low, 0.02, func(v []float64) float64 { return plateStrip(v, 0, 2, v[2]) }},
		{"long along x, held edges: a beam along y, β_y²a²/b²", "lambda2", High, 0.02, func(v []float64) float64 { return v[1] * v[1] * plateStrip(v, 1, 3, v[3]) }},
	},
	Eval: func(v []float64) ([]float64, error) {
		edges, m, n := int(v[0]), int(v[2]), int(v[3])
		return twoValues(PlateMode(plateEdgeNames[edges], v[1], m, n, v[4]))
	},
}

// plateStrip is β² of mode n of a beam that runs between the edges with the
// numbers first and last, NaN for a plate with a free edge: that one bends across.
func plateStrip(v []float64, first, last int, n float64) float64 {
	edges := plateEdgeNames[int(v[0])]
	if strings.Contains(edges, "F") {
		return math.NaN()
	}
	β := beamRoot(heldSupport(edges[first], edges[last]), int(n))
	return β * β
}

var circularPlateModeEntry = &Entry{
	Name:     "CircularPlateMode",
	Problem:  "modes of a thin circular plate",
	Equation: "λ² = ωa²√(ρh/D); clamped J_s I_(s+1) + I_s J_(s+1) = 0 at λ; simply supported J_(s+1)/J_s + I_(s+1)/I_s = 2λ/(1 − ν)",
	Args:     discArgs(float64(CircularSimplySupported)),
	Outputs:  []Output{{ID: "lambda2", Symbol: "λ²", Doc: "frequency parameter, on the radius"}},
	Accuracy: 1e-10, Factor: 1.05,
	Sources: []*cite.Source{cite.Leissa1969},
	Note:    "A free plate needs a nodal circle or two diameters.",
	Eval: func(v []float64) ([]float64, error) {
		edge, circles, diameters := CircularEdge(v[0]), int(v[1]), int(v[2])
		return oneValue(CircularPlateMode(edge, circles, diameters, v[3]))
	},
}

var elasticCircularPlateModeEntry = &Entry{
	Name:     "ElasticCircularPlateMode",
	Problem:  "modes of a circular plate whose edge is held by a rotational spring",
	Equation: "(κ − 1 + ν)[J_(s+1) + J_s I_(s+1)/I_s] + 2λJ_s = 0 at λ",
	Args: append([]Arg{
		{Name: "kappa", Symbol: "κ", Doc: "rotational stiffness of the edge, kθ a/D; 1e12: clamped", Min: 0, Max: rigidSpring, From: 0.01, To: 1e4},
	}, discArgs(0)[1:]...),
	Outputs:  []Output{{ID: "lambda2", Symbol: "λ²", Doc: "frequency parameter, on the radius"}},
	Accuracy: 1e-10, Factor: 1.05,
	Sources: []*cite.Source{cite.Leissa1969},
	Limits: []Limit{
		{"simply supported", "lambda2", Low, 1e-12, func(v []float64) float64 {
			return orNone(CircularPlateMode(CircularSimplySupported, int(v[1]), int(v[2]), v[3]))
		}},
		{"clamped", "lambda2", High, 1e-9, func(v []float64) float64 {
			return orNone(CircularPlateMode(CircularClamped, int(v[1]), int(v[2]), v[3]))
		}},
	},
	Eval: func(v []float64) ([]float64, error) {
		circles, diameters := int(v[1]), int(v[2])
		return oneValue(ElasticCircularPlateMode(v[0], circles, diameters, v[3]))
	},
}

var largeAmplitudeEntry = &Entry{
	Name:     "LargeAmplitude",
	Problem:  "rise of the first natural frequency with amplitude when the supports do not move in the plane",
	Equation: "ω/ω₀ = (π/2)√(1 + ε)/K(k), k² = ε/(2(1 + ε)); about √(1 + ¾ε), pinned beam ¾ε = (3/16)(w/r)²",
	Args: []Arg{
		{Name: "kind", Doc: "structure", Choices: largeAmplitudeNames},
		{Name: "ratio", Symbol: "w/h", Doc: "amplitude over thickness (plates) or over the radius of gyration of the section (beams)", Min: 0, Max: largestBeamAmplitude, Typical: 1},
		{Name: "aspect", Symbol: "a/b", Doc: "sides of the simply supported plate", Min: 0.1, Max: 10, Optional: true, Default: 1},
		poissonArg(),
	},
	Outputs:  []Output{{ID: "frequency_ratio", Symbol: "ω/ω₀", Doc: "frequency over that at small amplitude"}},
	Accuracy: 0.03, Factor: 1.1,
	Sources: []*cite.Source{cite.WoinowskyKrieger1950, cite.ChuHerrmann1956},
	Note:    "Plates to w/h = 1. With edges free to move in the plane, and for cantilevers, the change is of the order of the slope squared.",
	Limits: []Limit{
		{"first order: √(1 + ¾ε)", "frequency_ratio", Low, 1e-12, func(v []float64) float64 {
			return math.Sqrt(1 + 0.75*stretchingCoefficient(LargeAmplitudeKind(v[0]), v[2], v[3])*v[1]*v[1])
		}},
	},
	Eval: func(v []float64) ([]float64, error) {
		kind := LargeAmplitudeKind(v[0])
		return oneValue(LargeAmplitude(kind, v[1], v[2], v[3]))
	},
}

var circularPlateAddedMassEntry = &Entry{
	Name:     "CircularPlateAddedMass",
	Problem:  "added mass of a circular plate in a rigid baffle, fluid on one side",
	Equation: "β = coefficient ρa/(ρ_s h); coefficient = ∫H² dk/∫W² r dr, H the Hankel transform of the mode shape",
	Args:     discArgs(float64(CircularClamped)),
	Over:     "circles",
	Outputs:  []Output{{ID: "coefficient", Symbol: "β ρ_s h/(ρa)", Doc: "added mass ratio over ρa/(ρ_s h), one side"}, uncertaintyOutput},
	Accuracy: 1e-9, Factor: 1.05,
	Sources: []*cite.Source{cite.Lamb1920, cite.McLachlan1932},
	Note:    "Clamped first mode: 0.6538 with the exact shape; Lamb's trial shape (1 − r²/a²)² gives 0.6689, 2.3 % more. Twice as much with fluid on both sides.",
	Limits: []Limit{
		{"infinite plate, ρ/k_b: 1/λ", "coefficient", High, 0.25, func(v []float64) float64 {
			return 1 / discRoot(CircularEdge(v[0]), int(v[1]), int(v[2]), v[3])
		}},
	},
	Eval: func(v []float64) ([]float64, error) {
		edge, circles, diameters := CircularEdge(v[0]), int(v[1]), int(v[2])
		coefficient, err := CircularPlateAddedMass(edge, circles, diameters, v[3])
		if err != nil {
			return nil, err
		}
		return []float64{coefficient, discUncertainty(edge, circles, diameters, v[3], coefficient)}, nil
	},
}

var baffledLoadingOutputs = []Output{
	{ID: "mass", Symbol: "μ̂", Doc: "added mass per area over ρa; added mass ratio over ρa/(ρ_s h)"},
	{ID: "resistance", Symbol: "r̂", Doc: "radiation resistance per area over ρc"},
	{ID: UncertaintyID, Symbol: "δ", Doc: "twice the change of either that finer integration makes"},
}

var baffledCircularPlateModeEntry = &Entry{
	Name:     "BaffledCircularPlateMode",
	Problem:  "fluid loading of a mode of a circular plate in a rigid baffle, one side, with sound",
	Equation: "Z/∫W²dA = ρc r̂ + iωμ̂ρa from ∫H²k dk/√(k² − k₀²)",
	Over:     "k0a",
	Args: append(withChoices(discArgs(float64(CircularClamped)), circularEdgeNames[:CircularFree]),
		Arg{Name: "k0a", Symbol: "k₀a", Doc: "acoustic wave number times radius", Min: 0, Max: 60, Optional: true, From: 0.1, To: 20}),
	Outputs:  baffledLoadingOutputs,
	Accuracy: 1e-6, Factor: 1.05,
	Sources: []*cite.Source{cite.McLachlan1932, cite.Lamb1920},
	Note:    "The accuracy refers to ρa and ρc.",
	Limits: []Limit{
		{"incompressible: CircularPlateAddedMass", "mass", Low, 1e-9, func(v []float64) float64 {
			return orNone(CircularPlateAddedMass(CircularEdge(v[0]), int(v[1]), int(v[2]), v[3]))
		}},
		{"plane wave: ρc", "resistance", High, 0.01, constant(1)},
	},
	Eval: func(v []float64) ([]float64, error) {
		edge, circles, diameters := CircularEdge(v[0]), int(v[1]), int(v[2])
		mass, resistance, err := BaffledCircularPlateMode(edge, circles, diameters, v[3], v[4])
		if err != nil {
			return nil, err
		}
		δ := baffledDiscUncertainty(edge, circles, diameters, v[3], v[4], baffledAnswer{mass, resistance})
		return []float64{mass, resistance, δ}, nil
	},
}

// withChoices replaces the choices of the first argument.
func withChoices(args []Arg, choices []string) []Arg {
	args[0].Choices = choices
	return args
}

var baffledPlateModeEntry = &Entry{
	Name:     "BaffledPlateMode",
	Problem:  "fluid loading of a mode of a rectangular plate in a rigid baffle, one side, with sound",
	Equation: "Z/∫W²dA = ρc r̂ + iωμ̂ρa from ∫∫∫∫ W W′ e^(−ik₀r)/(2πr) dA dA′",
	Over:     "k0a",
	Args: append(append([]Arg{
		supportArg("edgesX", "supports at x = 0 and x = a"), supportArg("edgesY", "supports at y = 0 and y = b"),
		aspectArg(),
	}, plateHalfWaves()...),
		Arg{Name: "k0a", Symbol: "k₀a", Doc: "acoustic wave number times the side a", Min: 0, Max: 60, Optional: true, From: 0.1, To: 20}),
	Outputs:  baffledLoadingOutputs,
	Accuracy: 1e-6, Factor: 1.05,
	Sources: []*cite.Source{cite.Wallace1972},
	Note:    "For the product of two beam modes; k₀b to 120. The accuracy refers to ρa and ρc.",
	Limits: []Limit{
		{"incompressible", "mass", Low, 1e-9, func(v []float64) float64 {
			mass, _, err := BaffledPlateMode(BeamSupport(v[0]), BeamSupport(v[1]), v[2], int(v[3]), int(v[4]), 0)
			return orNone(mass, err)
		}},
		{"pinned, odd modes, long waves: 32k₀²ab/(π⁵m²n²)", "resistance", Low, 1e-9, func(v []float64) float64 {
			if v[0] != float64(PinnedPinned) || v[1] != float64(PinnedPinned) || int(v[3])%2 == 0 || int(v[4])%2 == 0 {
				return math.NaN()
			}
			return 32 * v[5] * v[5] / (v[2] * math.Pow(math.Pi, 5) * v[3] * v[3] * v[4] * v[4])
		}},
		{"plane wave: ρc", "resistance", High, 0.01, constant(1)},
	},
	Eval: func(v []float64) ([]float64, error) {
		x, y, m, n := BeamSupport(v[0]), BeamSupport(v[1]), int(v[3]), int(v[4])
		mass, resistance, err := BaffledPlateMode(x, y, v[2], m, n, v[5])
		if err != nil {
			return nil, err
		}
		δ := baffledUncertainty(baffledKey{x: x, y: y, aspect: v[2], k0: v[5], m: m, n: n}, baffledAnswer{mass, resistance})
		return []float64{mass, resistance, δ}, nil
	},
}

var cavityStiffnessEntry = &Entry{
	Name:     "CavityStiffness",
	Problem:  "share of a closed shallow cavity's stiffness that a mode of a rectangular plate over it feels",
	Equation: "s = (mean W)²/(mean W²)",
	Args: append([]Arg{
		supportArg("edgesX", "supports at x = 0 and x = a"), supportArg("edgesY", "supports at y = 0 and y = b"),
	}, withLimit(plateHalfWaves(), beamModeLimit)...),
	Outputs:  []Output{{ID: "share", Symbol: "s", Doc: "stiffness per area over ρc²/d, d the depth of the cavity"}},
	Accuracy: 1e-10, Factor: 1.05,
	Sources: []*cite.Source{cite.Blevins1979},
	Eval: func(v []float64) ([]float64, error) {
		x, y, m, n := BeamSupport(v[0]), BeamSupport(v[1]), int(v[2]), int(v[3])
		return oneValue(CavityStiffness(x, y, m, n))
	},
}

// withLimit replaces the upper limits of the arguments.
func withLimit(args []Arg, limit float64) []Arg {
	for i := range args {
		args[i].Max = limit
	}
	return args
}

var stringModeEntry = &Entry{
	Name:     "StringMode",
	Problem:  "modes of a taut string, or of a cable of small sag in its plane",
	Equation: "ωL√(m/T) = nπ; with sag, odd n: tan(ω̄/2) = ω̄/2 − (4/λ²)(ω̄/2)³",
	Args: []Arg{
		beamModeNumber(beamModeLimit),
		{Name: "sag", Symbol: "λ²", Doc: "Irvine's parameter of sag and stretch", Min: 0, Max: 1e6, Optional: true, From: 0.1, To: 1e5},
	},
	Outputs:  []Output{{ID: "frequency", Symbol: "ω̄", Doc: "ωL√(m/T)"}},
	Accuracy: 1e-12, Factor: 1.02,
	Sources: []*cite.Source{cite.IrvineCaughey1974, cite.Blevins1979},
	Note:    "No bending stiffness: TensionedBeam has it.",
	Limits: []Limit{
		{"straight: nπ", "frequency", Low, 1e-12, func(v []float64) float64 { return v[0] * math.Pi }},
		{"does not stretch: tan(ω̄/2) = ω̄/2, odd n", "frequency", High, 1e-4, func(v []float64) float64 {
			if int(v[0])%2 == 0 {
				return v[0] * math.Pi
			}
			return 2 * sagRoot(int(v[0]), math.Inf(1))
		}},
	},
	Eval: func(v []float64) ([]float64, error) {
		n := int(v[0])
		return oneValue(StringMode(n, v[1]))
	},
}

var ringModeEntry = &Entry{
	Name:     "RingMode",
	Problem:  "in-plane bending of a thin ring or long tube",
	Equation: "ωR²√(m/EI) = n(n² − 1)/√(n² + 1)",
	Args:     []Arg{{Name: "n", Symbol: "n", Doc: "waves round the circumference", Min: 2, Max: 1000, Whole: true}},
	Outputs:  []Output{{ID: "frequency", Symbol: "ω̄", Doc: "ωR²√(m/EI)"}},
	Accuracy: 1e-12, Factor: 1.05,
	Sources: []*cite.Source{cite.Love1927, cite.Blevins1979},
	Note:    "For a long tube EI is Eh³/(12(1−ν²)) and m is ρh.",
	Limits: []Limit{
		{"many waves, a straight beam: n²", "frequency", High, 1e-5, func(v []float64) float64 { return v[0] * v[0] }},
	},
	Eval: func(v []float64) ([]float64, error) {
		n := int(v[0])
		return oneValue(RingMode(n))
	},
}

var breathingTubeEntry = &Entry{
	Name:     "BreathingTube",
	Problem:  "axisymmetric radial motion of a thin ring or long tube",
	Equation: "ωR√(ρ/E) = 1 axially free, 1/√(1 − ν²) axially held",
	Args:     []Arg{{Name: "ends", Doc: "whether the tube may change its length", Choices: tubeEndNames, Typical: float64(AxiallyHeld)}, poissonArg()},
	Outputs:  []Output{{ID: "frequency", Symbol: "ω̄", Doc: "ωR√(ρ/E)"}},
	Accuracy: 1e-12, Factor: 1.05,
	Sources: []*cite.Source{cite.Love1927, cite.Blevins1979},
	Limits: []Limit{
		{"no Poisson effect: 1", "frequency", Low, 1e-12, constant(1)},
	},
	Eval: func(v []float64) ([]float64, error) {
		ends := TubeEnds(v[0])
		return oneValue(BreathingTube(ends, v[1]))
	},
}
