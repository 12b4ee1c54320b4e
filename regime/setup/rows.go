package setup

import (
	"math"
	"slices"

	"regimed/regime/canon"
	"regimed/regime/cite"
	"regimed/regime/group"
	"regimed/regime/scale"
	"regimed/units"
)

// Judgements behind the figures: each is a usual value of the trade, without a
// source of its own, and stands here by name.
const (
	stepsPerPeriod    = 20.0  // of a structural mode
	fineStepsPerMode  = 50.0  // where the amplitude has to be accurate
	stepsPerShedding  = 100.0 // of a shedding period
	stepsPerWave      = 100.0
	sheddingCycles    = 20.0
	settlingCap       = 200.0 // periods
	cellsAlongBody    = 50.0
	cellsPerWave      = 10.0 // second-order elements
	layerGrowth       = 1.2
	domainUp          = 15.0 // lengths, up- and sideways
	domainDown        = 30.0
	iterationsResidue = 1e-3
)

// Rows lists the figures, in the order of a set-up.
var Rows = slices.Concat(timeRows, spaceRows)

// fastest is the larger of the wet frequency and that of the motion; where only
// one is known, that one.
func fastest(c *Case) float64 {
	motion, wet := c.X(scale.FrequencyMotion), c.X(scale.FrequencyWet)
	if wet > motion || math.IsNaN(motion) {
		return wet
	}
	return motion
}

// timeRows are time steps and durations.
var timeRows = []Row{
	{ID: "time_step_structure", Title: "Time step for the structural mode", Kind: units.Time, Purpose: TimeStep, Source: cite.ThisMethod,
		Rule: "wet period, or that of a faster motion, / 20; / 50 where the amplitude has to be accurate", For: func(c *Case) bool { return dynamic(c) && c.Axes.Coupling != "one-way" || marching(c) },
		Value: func(c *Case) float64 { return 1 / (stepsPerPeriod * fastest(c)) }},
	{ID: "time_step_structure_fine", Title: "Time step for an accurate amplitude", Kind: units.Time, Source: cite.ThisMethod,
		Rule: "wet period, or that of a faster motion, / 50", For: func(c *Case) bool { return marching(c) && dynamic(c) },
		Value: func(c *Case) float64 { return 1 / (fineStepsPerMode * fastest(c)) }},
	{ID: "time_step_shedding", Title: "Time step for the shedding", Kind: units.Time, Purpose: TimeStep, Source: cite.ThisMethod,
		Rule: "shedding period / 100", For: marching,
		Value: func(c *Case) float64 {
			return c.X(scale.Length) / (stepsPerShedding * c.known(group.Strouhal) * c.X(scale.Speed))
		}},
	{ID: "time_step_courant", Title: "Time step for a Courant number of 1", Kind: units.Time, Purpose: TimeStep, Source: cite.ThisMethod,
		Rule: "cell along the body (L/50) / U; the smallest cell across the flow asks for less in an explicit solver", For: func(c *Case) bool { return meshedFlow(c) && marching(c) },
		Value: func(c *Case) float64 { return c.X(scale.Length) / cellsAlongBody / c.X(scale.Speed) }},
	{ID: "time_step_acoustic", Title: "Time step for sound", Kind: units.Time, Purpose: TimeStep, Source: cite.ThisMethod,
		Rule: "acoustic cell / c", For: func(c *Case) bool { return compressible(c) && (marching(c) || c.Axes.Fluid == "acoustic") },
		Value: func(c *Case) float64 { return acousticCell(c) / c.X(scale.SoundSpeed) }},
	{ID: "time_step_wave", Title: "Time step for the waves", Kind: units.Time, Purpose: TimeStep, Source: cite.ThisMethod,
		Rule: "wave period / 100", For: func(c *Case) bool { return c.Groups.Any(group.Waves) },
		Value: func(c *Case) float64 { return 1 / (stepsPerWave * c.X(scale.FrequencyWave)) }},
	{ID: "time_step_sloshing", Title: "Time step for the sloshing", Kind: units.Time, Purpose: TimeStep, Source: cite.ThisMethod,
		Rule: "period of the third sloshing mode / 20", For: freeSurface,
		Value: func(c *Case) float64 { return 1 / (stepsPerPeriod * c.X(scale.FrequencySloshThird)) }},
	{ID: "time_step_closure", Title: "Time step for the closing valve", Kind: units.Time, Purpose: TimeStep, Source: cite.ThisMethod,
		Rule: "closure time / 20", For: func(c *Case) bool { return c.Axes.Fluid == "one-dimensional" || marching(c) },
		Value: func(c *Case) float64 { return c.X(scale.ClosureTime) / stepsPerPeriod }},
	{ID: "duration_sloshing", Title: "Duration for the sloshing", Kind: units.Time, Purpose: Duration, Source: cite.ThisMethod,
		Rule: "three periods of the first sloshing mode", For: freeSurface,
		Value: func(c *Case) float64 { return 3 / c.X(scale.FrequencySlosh) }},
	{ID: "duration_settling", Title: "Duration until a start has died away", Kind: units.Time, Purpose: Duration, Source: cite.ThisMethod,
		Rule: "ln 100/(ζω) with the wet total damping, at most 200 periods", For: func(c *Case) bool { return marching(c) && dynamic(c) },
		Value: func(c *Case) float64 {
			f := c.X(scale.FrequencyWet)
			return math.Min(math.Log(100)/(2*math.Pi*f*c.known(group.DampingTotal)), settlingCap/f)
		}},
	{ID: "duration_shedding", Title: "Duration for statistics of the shedding", Kind: units.Time, Purpose: Duration, Source: cite.ThisMethod,
		Rule: "20 shedding periods", For: marching,
		Value: func(c *Case) float64 {
			return sheddingCycles * c.X(scale.Length) / (c.known(group.Strouhal) * c.X(scale.Speed))
		}},
}

// spaceRows are the figures of meshes, domains and coupling.
var spaceRows = []Row{
	{ID: "first_cell_resolved", Title: "First cell, wall resolved (y⁺ = 1)", Kind: units.Length, Source: cite.Schlichting1979,
		Rule: "ν/u_τ, u_τ = U√(c_f/2), c_f of a flat plate at the Reynolds number of the length along the flow", For: meshedFlow,
		Value: func(c *Case) float64 { return wallUnit(c) }},
	{ID: "first_cell_wall_function", Title: "First cell, wall function (y⁺ = 30)", Kind: units.Length, Source: cite.Schlichting1979,
		Rule: "30 ν/u_τ", For: func(c *Case) bool { return meshedFlow(c) && c.Axes.Turbulence == "turbulent" },
		Value: func(c *Case) float64 { return 30 * wallUnit(c) }},
	{ID: "boundary_layer", Title: "Thickness of the boundary layer", Kind: units.Length, Source: cite.Schlichting1979,
		Rule: "flat plate, at the end of the length along the flow", For: meshedFlow,
		Value: func(c *Case) float64 {
			layer, length := plateLayer(c)
			return layer.Thickness * length
		}},
	{ID: "layers", Title: "Layers of cells in the boundary layer", Kind: units.Dimensionless, Source: cite.ThisMethod,
		Rule: "from the first cell at y⁺ = 1, growing by 1.2", For: meshedFlow,
		Value: func(c *Case) float64 {
			layer, length := plateLayer(c)
			return math.Ceil(math.Log1p(layer.Thickness*length*(layerGrowth-1)/wallUnit(c)) / math.Log(layerGrowth))
		}},
	{ID: "stokes_layer_cell", Title: "Cell in the oscillating layer", Kind: units.Length, Source: cite.Batchelor1967,
		Rule: "δ/5, δ = √(2ν/ω)", For: func(c *Case) bool { return c.Axes.Viscous == "yes" && (resolved(c) || c.Axes.Fluid == "thermoviscous") },
		Value: func(c *Case) float64 {
			return math.Sqrt(c.X(scale.KinematicViscosity)/(math.Pi*c.X(scale.FrequencyMotion))) / 5
		}},
	{ID: "cell_along_body", Title: "Cell along the body", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "L/50", For: meshedFlow, Value: func(c *Case) float64 { return c.X(scale.Length) / cellsAlongBody }},
	{ID: "cell_acoustic", Title: "Cell for sound", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "wavelength c/f / 10, second-order elements", For: func(c *Case) bool { return compressible(c) },
		Value: func(c *Case) float64 { return acousticCell(c) }},
	{ID: "cell_bending", Title: "Element for bending", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "bending wavelength 2π/k_b / 10, second-order elements", For: func(c *Case) bool { return c.Has(scale.WaveNumber) },
		Value: func(c *Case) float64 { return 2 * math.Pi / c.X(scale.WaveNumber) / cellsPerWave }},
	{ID: "cell_wave_length", Title: "Cell along the waves", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "wavelength / 60", For: freeSurface, Value: func(c *Case) float64 { return c.X(scale.WaveLength) / 60 }},
	{ID: "cell_wave_height", Title: "Cell across the surface", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "wave height / 15 (10 to 20)", For: freeSurface, Value: func(c *Case) float64 { return c.X(scale.WaveHeight) / 15 }},
	{ID: "depth_deep_water", Title: "Depth from which the water is deep", Kind: units.Length, Source: cite.Airy1845,
		Rule: "half a wavelength", For: freeSurface, Value: func(c *Case) float64 { return c.X(scale.WaveLength) / 2 }},
	{ID: "domain_upstream", Title: "Domain up- and sideways", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "15 L (10 to 20)", For: func(c *Case) bool { return meshedFlow(c) && c.Groups.Is(group.Bluff) },
		Value: func(c *Case) float64 { return domainUp * c.X(scale.Length) }},
	{ID: "domain_downstream", Title: "Domain downstream", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "30 L", For: func(c *Case) bool { return meshedFlow(c) && c.Groups.Is(group.Bluff) },
		Value: func(c *Case) float64 { return domainDown * c.X(scale.Length) }},
	{ID: "domain_acoustic", Title: "Domain for sound", Kind: units.Length, Source: cite.ThisMethod,
		Rule: "one wavelength c/f, or an absorbing boundary", For: func(c *Case) bool { return compressible(c) },
		Value: func(c *Case) float64 { return c.X(scale.SoundSpeed) / c.X(scale.FrequencyMotion) }},
	{ID: "relaxation", Title: "Starting relaxation", Kind: units.Dimensionless, Source: cite.Causin2005,
		Rule: "1/(1 + μ) for one wetted mode", For: iterated,
		Value: func(c *Case) float64 { return 1 / (1 + c.known(group.AddedMassRatio)) }},
	{ID: "relaxation_limit", Title: "Largest relaxation that converges", Kind: units.Dimensionless, Source: cite.Causin2005,
		Rule: "2/(1 + μ)", For: iterated,
		Value: func(c *Case) float64 { return 2 / (1 + c.known(group.AddedMassRatio)) }},
	{ID: "coupling_iterations", Title: "Iterations a step with fixed relaxation", Kind: units.Dimensionless, Source: cite.Causin2005,
		Rule: "to 1e-3 at the rate μ/(2 + μ) of modes between 0 and μ; above about 10 accelerate (Aitken, quasi-Newton); a smaller time step does not help in an incompressible fluid", For: iterated,
		Value: func(c *Case) float64 {
			mu := c.known(group.AddedMassRatio)
			return math.Max(1, math.Ceil(math.Log(iterationsResidue)/math.Log(mu/(2+mu))))
		}},
	{ID: "mesh_motion", Title: "Motion over gap", Kind: units.Dimensionless, Source: cite.ThisMethod,
		Rule: "ξ/gap: a deforming mesh up to about 0.3, overset or remeshing beyond", For: func(c *Case) bool { return c.Axes.Fluid == "resolved" && c.Axes.Coupling != "one-way" },
		Value: func(c *Case) float64 { return c.known(group.DisplacementGap) }},
	{ID: "mesh_motion_cells", Title: "Motion over first cell", Kind: units.Dimensionless, Source: cite.ThisMethod,
		Rule: "ξ over the first cell at y⁺ = 1: above 1 the layers must move with the wall", For: func(c *Case) bool { return c.Axes.Fluid == "resolved" && c.Axes.Coupling != "one-way" && moving(c) },
		Value: func(c *Case) float64 { return c.X(scale.Amplitude) / wallUnit(c) }},
	{ID: "size_cells", Title: "Cells, as an order of magnitude", Kind: units.Dimensionless, Source: cite.ThisMethod,
		Rule: "layers × cells round the body × domain, times cells along the span where the flow is three-dimensional", For: meshedFlow,
		Value: sizeOfMesh},
	{ID: "size_steps", Title: "Time steps, as an order of magnitude", Kind: units.Dimensionless, Source: cite.ThisMethod,
		Rule: "longest duration over smallest time step", For: func(c *Case) bool { return meshedFlow(c) && marching(c) },
		Value: func(c *Case) float64 { return longest(c) / smallest(c) }},
}

// acousticCell is a tenth of a wavelength, and no more than the body asks for.
func acousticCell(c *Case) float64 {
	cell := c.X(scale.SoundSpeed) / c.X(scale.FrequencyMotion) / cellsPerWave
	return math.Min(cell, c.X(scale.Length)/4)
}

// plateLayer is the boundary layer of a flat plate at the end of the body: the
// span of a body along the flow, else its flow length.
func plateLayer(c *Case) (canon.FlatPlateLayer, float64) {
	re, length := c.known(group.Reynolds), c.X(scale.Length)
	if c.Groups.Is(group.Axial) && c.Groups.Has(group.LengthReynolds) {
		re, length = c.known(group.LengthReynolds), c.X(scale.Span)
	}
	layer, err := canon.FlatPlate(re, re > 5e5)
	if err != nil {
		nan := math.NaN()
		return canon.FlatPlateLayer{LocalFriction: nan, Thickness: nan}, nan
	}
	return layer, length
}

// wallUnit is ν/u_τ, the distance of y⁺ = 1.
func wallUnit(c *Case) float64 {
	layer, _ := plateLayer(c)
	return c.X(scale.KinematicViscosity) / (c.X(scale.Speed) * math.Sqrt(layer.LocalFriction/2))
}

// sizeOfMesh counts cells round the body (150), over the layers and twice as
// many beyond, and along the span by its length in bodies.
func sizeOfMesh(c *Case) float64 {
	layer, length := plateLayer(c)
	layers := math.Log1p(layer.Thickness*length*(layerGrowth-1)/wallUnit(c)) / math.Log(layerGrowth)
	cells := 3 * cellsAlongBody * 3 * layers
	if c.Axes.Dimensions == "three" {
		span := c.X(scale.Span) / c.X(scale.Length)
		if math.IsNaN(span) {
			span = 1
		}
		cells *= math.Max(1, span) * cellsAlongBody
	}
	return roundToDigit(cells)
}

// roundToDigit keeps one significant digit: an order of magnitude.
func roundToDigit(x float64) float64 {
	p := math.Pow(10, math.Floor(math.Log10(x)))
	return math.Round(x/p) * p
}

// smallest is the least time step of the rows, longest the largest duration.
func smallest(c *Case) float64 { return extreme(c, TimeStep, math.Min, math.Inf(1)) }
func longest(c *Case) float64  { return extreme(c, Duration, math.Max, 0) }

func extreme(c *Case, p Purpose, pick func(a, b float64) float64, start float64) float64 {
	for i := range timeRows {
		if r := &timeRows[i]; r.Purpose == p && r.For(c) {
			if v := r.Value(c); v > 0 && !math.IsInf(v, 1) {
				start = pick(start, v)
			}
		}
	}
	return start
}
