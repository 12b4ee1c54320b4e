package canon

import (
	"math"

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

// wholeArgs reads arguments that are whole numbers and keeps the first error.
type wholeArgs struct {
	function string
	values   []float64
	err      error
}

func (w *wholeArgs) at(i int, name string) int {
	x := w.values[i]
	if w.err == nil && x != math.Trunc(x) {
		w.err = &RangeError{Function: w.function, Arg: name, Value: x, Reason: "want a whole number"}
	}
	return int(x)
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

func supportArg(name, doc string) Arg {
	return Arg{Name: name, Doc: doc, Choices: beamSupportNames}
}

func beamModeNumber(limit float64) Arg {
	return Arg{Name: "n", Symbol: "n", Doc: "mode number, from the lowest", Min: 1, Max: limit}
}

func poissonArg() Arg {
	return Arg{Name: "nu", Symbol: "ν", Doc: "Poisson's ratio", Min: 0, Max: 0.5, Optional: true, Default: 0.3}
}

func aspectArg() Arg {
	return Arg{Name: "aspect", Symbol: "a/b", Doc: "side along x over side along y", Min: 0.1, Max: 10}
}

func discArgs() []Arg {
	return []Arg{
		{Name: "edge", Doc: "how the edge is held", Choices: circularEdgeNames},
		{Name: "circles", Symbol: "n", Doc: "nodal circles within the edge", Min: 0, Max: discModeLimit},
		{Name: "diameters", Symbol: "s", Doc: "nodal diameters", Min: 0, Max: discModeLimit, Optional: true, Default: 0},
		poissonArg(),
	}
}

func plateHalfWaves() []Arg {
	return []Arg{
		{Name: "m", Symbol: "m", Doc: "half waves along x", Min: 1, Max: plateModeLimit},
		{Name: "n", Symbol: "n", Doc: "half waves along y", Min: 1, Max: plateModeLimit},
	}
}

var beamModeEntry = &Entry{
	Name:     "BeamMode",
	Problem:  "bending modes of a uniform beam, with or without a mass at its free end",
	Equation: "ω = β²√(EI/(mL⁴)); sin β = 0; cos β cosh β = ∓1; tan β = tanh β",
	Args: []Arg{
		supportArg("support", "supports of the two ends"), beamModeNumber(beamModeLimit),
		{Name: "tipMassRatio", Symbol: "M", Doc: "mass at the free end over the mass of the beam", Min: 0, Max: beamTipMassLimit, Optional: true},
	},
	Outputs:  []Output{{ID: "beta", Symbol: "β", Doc: "wave number times length"}},
	Accuracy: 1e-12, Factor: 1.05,
	Sources: []*cite.Source{cite.Blevins1979},
	Note:    "Euler–Bernoulli: no shear, no rotary inertia; the tip mass is a point. Free-free: the first mode is the first that bends.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "BeamMode", values: v}
		support, n := BeamSupport(w.at(0, "support")), w.at(1, "n")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(BeamMode(support, n, v[2]))
	},
}

var beamShapeEntry = &Entry{
	Name:     "BeamShape",
	Problem:  "shape of a bending mode of a uniform beam",
	Equation: "w⁗ = β⁴w with the end conditions, max |w| = 1",
	Args: []Arg{
		supportArg("support", "supports of the two ends"), beamModeNumber(beamModeLimit),
		{Name: "x", Symbol: "x/L", Doc: "distance from the first end over the length", Min: 0, Max: 1},
	},
	Outputs:  []Output{{ID: "shape", Symbol: "w", Doc: "deflection over the largest deflection"}},
	Accuracy: 1e-10, Factor: 1.05,
	Sources: []*cite.Source{cite.Blevins1979},
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "BeamShape", values: v}
		support, n := BeamSupport(w.at(0, "support")), w.at(1, "n")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(BeamShape(support, n, v[2]))
	},
}

var beamModeFactorsEntry = &Entry{
	Name:     "BeamModeFactors",
	Problem:  "averages and extremes of the shape of a bending mode",
	Equation: "∫w dx, ∫w² dx, ∫w′² dx, max |w′|, max |w″| with max |w| = 1 and x from 0 to 1",
	Args:     []Arg{supportArg("support", "supports of the two ends"), beamModeNumber(beamModeLimit)},
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
		w := wholeArgs{function: "BeamModeFactors", values: v}
		support, n := BeamSupport(w.at(0, "support")), w.at(1, "n")
		if w.err != nil {
			return nil, w.err
		}
		f, err := BeamModeFactors(support, n)
		if err != nil {
			return nil, err
		}
		return []float64{f.Mean, f.MeanSquare, f.MeanSquareSlope, f.MaxSlope, f.MaxCurvature}, nil
	},
}

func beamEndArgs(side string) []Arg {
	return []Arg{
		{Name: side + "Translation", Symbol: "kL³/EI", Doc: "spring across the " + side + " end; 1e12: held", Min: 0, Max: rigidSpring},
		{Name: side + "Rotation", Symbol: "kθL/EI", Doc: "rotational spring at the " + side + " end; 1e12: held", Min: 0, Max: rigidSpring},
		{Name: side + "Mass", Symbol: "M", Doc: "mass at the " + side + " end over the mass of the beam", Min: 0, Max: beamTipMassLimit},
	}
}

var elasticBeamModeEntry = &Entry{
	Name:     "ElasticBeamMode",
	Problem:  "bending modes of a uniform beam on elastic ends with end masses",
	Equation: "ω = β²√(EI/(mL⁴)); det[K(β) + springs − masses β⁴] = 0",
	Args:     append(append(beamEndArgs("left"), beamEndArgs("right")...), beamModeNumber(1000)),
	Outputs:  []Output{{ID: "beta", Symbol: "β", Doc: "wave number times length"}},
	Accuracy: 1e-8, Factor: 1.1,
	Sources: []*cite.Source{cite.WittrickWilliams1971, cite.Blevins1979},
	Note:    "A relative stiffness is 0 or at least 1e-6. Motions of zero frequency are not counted.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "ElasticBeamMode", values: v}
		n := w.at(6, "n")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(ElasticBeamMode(BeamEnd{v[0], v[1], v[2]}, BeamEnd{v[3], v[4], v[5]}, n))
	},
}

var tensionedBeamEntry = &Entry{
	Name:     "TensionedBeam",
	Problem:  "effect of axial tension or compression on the natural frequency of a beam",
	Equation: "pinned-pinned ω/ω₀ = √(1 + τ/(n²π²)), τ = TL²/EI; others by the boundary determinant",
	Args: []Arg{
		{Name: "support", Doc: "supports of the two ends", Choices: beamSupportNames[:FreeFree]}, beamModeNumber(1000),
		{Name: "tension", Symbol: "τ", Doc: "TL²/EI, negative in compression", Min: -4 * math.Pi * math.Pi, Max: tensionLimit},
	},
	Outputs:  []Output{{ID: "frequency_ratio", Symbol: "ω/ω₀", Doc: "frequency over that without tension"}},
	Accuracy: 1e-8, Factor: 1.05,
	Sources: []*cite.Source{cite.Bokaian1990, cite.WittrickWilliams1971},
	Note:    "Compression to 0.999 of the buckling load of the supports. The force keeps its direction at a free end.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "TensionedBeam", values: v}
		support, n := BeamSupport(w.at(0, "support")), w.at(1, "n")
		if w.err != nil {
			return nil, w.err
		}
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
		{Name: "edges", Doc: "edges at x = 0, y = 0, x = a, y = b: C clamped, S simply supported, F free", Choices: plateEdgeNames},
		aspectArg(),
	}, plateHalfWaves()...), poissonArg()),
	Outputs: []Output{
		{ID: "lambda2", Symbol: "λ²", Doc: "frequency parameter, on the side a"},
		{ID: "uncertainty", Symbol: "δ", Doc: "relative change that further polynomials may make, downward"},
	},
	Accuracy: 5e-3, Factor: 1.05,
	Sources: []*cite.Source{cite.Leissa1969, cite.Leissa1973, cite.Bhat1985},
	Note:    "With a free edge and no opposite edges simply supported, m ranks the modes and n is 1. The accuracy is that of the worst corner of the range; the uncertainty returned is mostly far smaller.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "PlateMode", values: v}
		edges, m, n := w.at(0, "edges"), w.at(2, "m"), w.at(3, "n")
		if w.err != nil {
			return nil, w.err
		}
		return twoValues(PlateMode(plateEdgeNames[edges], v[1], m, n, v[4]))
	},
}

var circularPlateModeEntry = &Entry{
	Name:     "CircularPlateMode",
	Problem:  "modes of a thin circular plate",
	Equation: "λ² = ωa²√(ρh/D); clamped J_s I_(s+1) + I_s J_(s+1) = 0 at λ; simply supported J_(s+1)/J_s + I_(s+1)/I_s = 2λ/(1 − ν)",
	Args:     discArgs(),
	Outputs:  []Output{{ID: "lambda2", Symbol: "λ²", Doc: "frequency parameter, on the radius"}},
	Accuracy: 1e-10, Factor: 1.05,
	Sources: []*cite.Source{cite.Leissa1969},
	Note:    "A free plate needs a nodal circle or two diameters.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "CircularPlateMode", values: v}
		edge, circles, diameters := CircularEdge(w.at(0, "edge")), w.at(1, "circles"), w.at(2, "diameters")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(CircularPlateMode(edge, circles, diameters, v[3]))
	},
}

var elasticCircularPlateModeEntry = &Entry{
	Name:     "ElasticCircularPlateMode",
	Problem:  "modes of a circular plate whose edge is held by a rotational spring",
	Equation: "(κ − 1 + ν)[J_(s+1) + J_s I_(s+1)/I_s] + 2λJ_s = 0 at λ",
	Args: append([]Arg{
		{Name: "kappa", Symbol: "κ", Doc: "rotational stiffness of the edge, kθ a/D; 1e12: clamped", Min: 0, Max: rigidSpring},
	}, discArgs()[1:]...),
	Outputs:  []Output{{ID: "lambda2", Symbol: "λ²", Doc: "frequency parameter, on the radius"}},
	Accuracy: 1e-10, Factor: 1.05,
	Sources: []*cite.Source{cite.Leissa1969},
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "ElasticCircularPlateMode", values: v}
		circles, diameters := w.at(1, "circles"), w.at(2, "diameters")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(ElasticCircularPlateMode(v[0], circles, diameters, v[3]))
	},
}

var largeAmplitudeEntry = &Entry{
	Name:     "LargeAmplitude",
	Problem:  "rise of the first natural frequency with amplitude when the supports do not move in the plane",
	Equation: "ω/ω₀ = (π/2)√(1 + ε)/K(k), k² = ε/(2(1 + ε)); about √(1 + ¾ε), pinned beam ¾ε = (3/16)(w/r)²",
	Args: []Arg{
		{Name: "kind", Doc: "structure", Choices: largeAmplitudeNames},
		{Name: "ratio", Symbol: "w/h", Doc: "amplitude over thickness (plates) or over the radius of gyration of the section (beams)", Min: 0, Max: largestBeamAmplitude},
		{Name: "aspect", Symbol: "a/b", Doc: "sides of the simply supported plate", Min: 0.1, Max: 10, Optional: true, Default: 1},
		poissonArg(),
	},
	Outputs:  []Output{{ID: "frequency_ratio", Symbol: "ω/ω₀", Doc: "frequency over that at small amplitude"}},
	Accuracy: 0.03, Factor: 1.1,
	Sources: []*cite.Source{cite.WoinowskyKrieger1950, cite.ChuHerrmann1956},
	Note:    "Plates to w/h = 1. With edges free to move in the plane, and for cantilevers, the change is of the order of the slope squared.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "LargeAmplitude", values: v}
		kind := LargeAmplitudeKind(w.at(0, "kind"))
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(LargeAmplitude(kind, v[1], v[2], v[3]))
	},
}

var circularPlateAddedMassEntry = &Entry{
	Name:     "CircularPlateAddedMass",
	Problem:  "added mass of a circular plate in a rigid baffle, fluid on one side",
	Equation: "β = coefficient ρa/(ρ_s h); coefficient = ∫H² dk/∫W² r dr, H the Hankel transform of the mode shape",
	Args:     discArgs(),
	Outputs:  []Output{{ID: "coefficient", Symbol: "β ρ_s h/(ρa)", Doc: "added mass ratio over ρa/(ρ_s h), one side"}},
	Accuracy: 1e-9, Factor: 1.05,
	Sources: []*cite.Source{cite.Lamb1920, cite.McLachlan1932},
	Note:    "Clamped first mode: 0.6538 with the exact shape; Lamb's trial shape (1 − r²/a²)² gives 0.6689, 2.3 % more. Twice as much with fluid on both sides.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "CircularPlateAddedMass", values: v}
		edge, circles, diameters := CircularEdge(w.at(0, "edge")), w.at(1, "circles"), w.at(2, "diameters")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(CircularPlateAddedMass(edge, circles, diameters, v[3]))
	},
}

var baffledLoadingOutputs = []Output{
	{ID: "mass", Symbol: "μ̂", Doc: "added mass per area over ρa; added mass ratio over ρa/(ρ_s h)"},
	{ID: "resistance", Symbol: "r̂", Doc: "radiation resistance per area over ρc"},
}

var baffledCircularPlateModeEntry = &Entry{
	Name:     "BaffledCircularPlateMode",
	Problem:  "fluid loading of a mode of a circular plate in a rigid baffle, one side, with sound",
	Equation: "Z/∫W²dA = ρc r̂ + iωμ̂ρa from ∫H²k dk/√(k² − k₀²)",
	Args: append(withChoices(discArgs(), circularEdgeNames[:CircularFree]),
		Arg{Name: "k0a", Symbol: "k₀a", Doc: "acoustic wave number times radius", Min: 0, Max: 60, Optional: true}),
	Outputs:  baffledLoadingOutputs,
	Accuracy: 1e-6, Factor: 1.05,
	Sources: []*cite.Source{cite.McLachlan1932, cite.Lamb1920},
	Note:    "The accuracy refers to ρa and ρc.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "BaffledCircularPlateMode", values: v}
		edge, circles, diameters := CircularEdge(w.at(0, "edge")), w.at(1, "circles"), w.at(2, "diameters")
		if w.err != nil {
			return nil, w.err
		}
		return twoValues(BaffledCircularPlateMode(edge, circles, diameters, v[3], v[4]))
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
	Args: append(append([]Arg{
		supportArg("edgesX", "supports at x = 0 and x = a"), supportArg("edgesY", "supports at y = 0 and y = b"),
		aspectArg(),
	}, plateHalfWaves()...),
		Arg{Name: "k0a", Symbol: "k₀a", Doc: "acoustic wave number times the side a", Min: 0, Max: 60, Optional: true}),
	Outputs:  baffledLoadingOutputs,
	Accuracy: 1e-6, Factor: 1.05,
	Sources: []*cite.Source{cite.Wallace1972},
	Note:    "For the product of two beam modes; k₀b to 120. The accuracy refers to ρa and ρc.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "BaffledPlateMode", values: v}
		x, y, m, n := BeamSupport(w.at(0, "edgesX")), BeamSupport(w.at(1, "edgesY")), w.at(3, "m"), w.at(4, "n")
		if w.err != nil {
			return nil, w.err
		}
		return twoValues(BaffledPlateMode(x, y, v[2], m, n, v[5]))
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
		w := wholeArgs{function: "CavityStiffness", values: v}
		x, y, m, n := BeamSupport(w.at(0, "edgesX")), BeamSupport(w.at(1, "edgesY")), w.at(2, "m"), w.at(3, "n")
		if w.err != nil {
			return nil, w.err
		}
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
		{Name: "sag", Symbol: "λ²", Doc: "Irvine's parameter of sag and stretch", Min: 0, Max: 1e6, Optional: true},
	},
	Outputs:  []Output{{ID: "frequency", Symbol: "ω̄", Doc: "ωL√(m/T)"}},
	Accuracy: 1e-12, Factor: 1.02,
	Sources: []*cite.Source{cite.IrvineCaughey1974, cite.Blevins1979},
	Note:    "No bending stiffness: TensionedBeam has it.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "StringMode", values: v}
		n := w.at(0, "n")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(StringMode(n, v[1]))
	},
}

var ringModeEntry = &Entry{
	Name:     "RingMode",
	Problem:  "in-plane bending of a thin ring or long tube",
	Equation: "ωR²√(m/EI) = n(n² − 1)/√(n² + 1)",
	Args:     []Arg{{Name: "n", Symbol: "n", Doc: "waves round the circumference", Min: 2, Max: 1000}},
	Outputs:  []Output{{ID: "frequency", Symbol: "ω̄", Doc: "ωR²√(m/EI)"}},
	Accuracy: 1e-12, Factor: 1.05,
	Sources: []*cite.Source{cite.Love1927, cite.Blevins1979},
	Note:    "For a long tube EI is Eh³/(12(1−ν²)) and m is ρh.",
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "RingMode", values: v}
		n := w.at(0, "n")
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(RingMode(n))
	},
}

var breathingTubeEntry = &Entry{
	Name:     "BreathingTube",
	Problem:  "axisymmetric radial motion of a thin ring or long tube",
	Equation: "ωR√(ρ/E) = 1 axially free, 1/√(1 − ν²) axially held",
	Args:     []Arg{{Name: "ends", Doc: "whether the tube may change its length", Choices: tubeEndNames}, poissonArg()},
	Outputs:  []Output{{ID: "frequency", Symbol: "ω̄", Doc: "ωR√(ρ/E)"}},
	Accuracy: 1e-12, Factor: 1.05,
	Sources: []*cite.Source{cite.Love1927, cite.Blevins1979},
	Eval: func(v []float64) ([]float64, error) {
		w := wholeArgs{function: "BreathingTube", values: v}
		ends := TubeEnds(w.at(0, "ends"))
		if w.err != nil {
			return nil, w.err
		}
		return oneValue(BreathingTube(ends, v[1]))
	},
}
