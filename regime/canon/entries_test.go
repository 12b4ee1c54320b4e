package canon

import (
	"errors"
	"go/ast"
	"go/parser"
	"go/token"
	"math"
	"math/rand/v2"
	"path/filepath"
	"slices"
	"strings"
	"testing"
)

// slowEntries solve eigenproblems or integrals: tests put fewer points on them.
var slowEntries = []string{
	"PlateMode", "ConveyingPipe", "PanelFlutter", "SectionFlutter", "BaffledPlateMode", "BaffledCircularPlateMode",
	"CircularPlateAddedMass", "ElasticBeamMode",
}

func isSlow(e *Entry) bool { return slices.Contains(slowEntries, e.Name) }

// usualArgs are the arguments of an entry in the middle of practice.
func usualArgs(e *Entry) []float64 {
	args := make([]float64, len(e.Args))
	for i := range e.Args {
		args[i] = e.Args[i].Usual()
	}
	return args
}

// Every solution of the subject exists as an entry, under the name that it has
// there.
func TestEveryRowOfTheSubjectIsAnEntry(t *testing.T) {
	rows := []struct {
		name    string
		args    []string
		outputs []string
	}{
		{"OscillatingCylinder", []string{"R"}, []string{"gamma_r", "gamma_i"}},
		{"OscillatingSphere", []string{"R"}, []string{"added_mass", "damping"}},
		{"OscillatingRibbon", []string{"R"}, []string{"gamma_r", "gamma_i"}},
		{"CylinderInShell", []string{"R", "q"}, []string{"gamma_r", "gamma_i"}},
		{"CylinderNearWall", []string{"e"}, []string{"coefficient"}},
		{"CylinderBelowSurface", []string{"d", "kind"}, []string{"coefficient"}},
		{"SoundCylinder", []string{"x"}, []string{"gamma_r", "gamma_i"}},
		{"SoundSphere", []string{"x"}, []string{"gamma_r", "gamma_i"}},
		{"BaffledPiston", []string{"x"}, []string{"resistance", "reactance"}},
		{"FlexuralWaveLoading", []string{"s", "kbL"}, []string{"added_mass", "resistance"}},
		{"CircularPlateAddedMass", []string{"edge"}, []string{"coefficient", UncertaintyID}},
		{"ThinFilm", []string{"sigma", "aspect"}, []string{"spring", "damping", UncertaintyID}},
		{"ThinFilmLiquid", []string{"aspect"}, []string{"damping", UncertaintyID}},
		{"VeijolaViscosity", []string{"Kn"}, []string{"ratio"}},
		{"PulsatileTube", []string{"alpha"}, []string{"re", "im"}},

		{"WaveNumber", []string{"kappa"}, []string{"kd"}},
		{"RectangularTank", []string{"n", "depth"}, []string{"frequency", "mass_fraction"}},
		{"UprightTank", []string{"n", "depth"}, []string{"frequency", "mass_fraction"}},
		{"SloshingMassFraction", []string{"tank", "depth"}, []string{"mass_fraction"}},
		{"CylinderDiffraction", []string{"ka"}, []string{"inertia", "lag"}},
		{"StokesSecondOrder", []string{"ka", "kd"}, []string{"ratio", "ursell"}},

		{"Theodorsen", []string{"k"}, []string{"re", "im"}},
		{"SectionFlutter", []string{"mu", "a", "x_alpha", "r2", "frequency_ratio"}, []string{"speed", "frequency"}},
		{"SectionDivergence", []string{"e", "lift_slope", "mach"}, []string{"pressure"}},
		{"ConveyingPipe", []string{"beta", "gamma", "alpha", "support"}, []string{"u", "omega", UncertaintyID}},
		{"WakeLockIn", []string{"am"}, []string{"low", "high"}},
		{"VortexAmplitude", []string{"mass_damping", "reynolds", "strouhal", "mode_factor"}, []string{"amplitude"}},
		{"Strouhal", []string{"reynolds", "shape"}, []string{"strouhal", "low", "high"}},
		{"GallopingSpeed", []string{"scruton", "a_g"}, []string{"speed"}},
		{"GallopingFactor", []string{"shape"}, []string{"a_g"}},
		{"TubeArrayCritical", []string{"mass_damping", "k"}, []string{"speed"}},
		{"FlagCritical", []string{"mass_ratio", "aspect"}, []string{"u"}},
		{"PanelFlutter", []string{"modes", "aspect"}, []string{"lambda", "omega", UncertaintyID}},
		{"PanelDivergence", []string{"sides", "mach"}, []string{"pressure"}},
		{"WaveSpeed", []string{"bulk_modulus", "density", "diameter", "wall", "wall_modulus", "constraint"}, []string{"speed"}},
		{"PipeConstraint", []string{"anchoring", "slenderness"}, []string{"constraint"}},
		{"JoukowskySurge", []string{"density", "wave_speed", "velocity_change", "closure"}, []string{"pressure"}},
		{"MoensKorteweg", []string{"wall_modulus", "wall", "density", "radius"}, []string{"speed"}},
		{"PulseWave", []string{"re", "im"}, []string{"speed", "decay"}},
		{"PrandtlGlauert", []string{"mach"}, []string{"excess"}},
		{"IsentropicDensityChange", []string{"mach", "gamma"}, []string{"change"}},

		{"BeamMode", []string{"support", "n"}, []string{"beta"}},
		{"PlateMode", []string{"edges", "aspect", "m", "n"}, []string{"lambda2", UncertaintyID}},
		{"CircularPlateMode", []string{"edge", "circles"}, []string{"lambda2"}},
		{"LargeAmplitude", []string{"kind", "ratio"}, []string{"frequency_ratio"}},
		{"StringMode", []string{"n"}, []string{"frequency"}},
		{"RingMode", []string{"n"}, []string{"frequency"}},
		{"BreathingTube", []string{"ends"}, []string{"frequency"}},

		{"ExplicitCoupling", []string{"mu", "scheme"}, []string{"limit", "ratio"}},
		{"CompressibleCoupling", []string{"mass_ratio", "courant"}, []string{"ratio", "courant_limit"}},
		{"FixedPointRelaxation", []string{"mu_min", "mu_max"}, []string{"limit", "optimum"}},
		{"Electromechanical", []string{"coupling"}, []string{"frequency_ratio", "damping"}},
		{"GeneralisedCoupling", []string{"k2"}, []string{"coupling"}},
	}
	ran := 0
	for _, row := range rows {
		e := Find(row.name)
		if e == nil || e.Name != row.name {
			t.Errorf("no entry %s", row.name)
			continue
		}
		for i, name := range row.args {
			if i >= len(e.Args) || e.Args[i].Name != name {
				t.Errorf("%s: argument %d is not %s", e.Name, i, name)
			}
		}
		for i, id := range row.outputs {
			if i >= len(e.Outputs) || e.Outputs[i].ID != id {
				t.Errorf("%s: output %d is not %s", e.Name, i, id)
			}
		}
		ran++
	}
	if ran != 53 {
		t.Errorf("ran %d rows, want 53", ran)
	}
}

func TestEntriesAreComplete(t *testing.T) {
	for _, e := range All() {
		if e.Problem == "" || e.Equation == "" || len(e.Args) == 0 || len(e.Outputs) == 0 || len(e.Sources) == 0 || !(e.Accuracy > 0) {
			t.Errorf("%s is incomplete", e.Name)
		}
		if !(e.Factor >= 1 && e.Factor <= 3) {
			t.Errorf("%s: model-form factor %g", e.Name, e.Factor)
		}
		for _, s := range e.Sources {
			if s.Locator == "" {
				t.Errorf("%s: %s does not say where to look", e.Name, s.Short)
			}
		}
		for i := range e.Args {
			checkArgIsComplete(t, e, &e.Args[i])
		}
		for _, o := range e.Outputs {
			if o.Doc == "" {
				t.Errorf("%s: output %s says nothing", e.Name, o.ID)
			}
		}
		if e.Sweep() < 0 {
			t.Errorf("%s: nothing to draw over", e.Name)
		}
		for _, l := range e.Limits {
			if l.Name == "" || l.Value == nil || !(l.Within > 0 && l.Within <= 0.25) || outputIndex(e, l.Output) < 0 {
				t.Errorf("%s: limit %q of %q is incomplete", e.Name, l.Name, l.Output)
			}
		}
	}
	if n := len(All()); n != 66 {
		t.Errorf("ran %d entries, want 66", n)
	}
}

func checkArgIsComplete(t *testing.T, e *Entry, a *Arg) {
	t.Helper()
	if a.Name == "" || a.Doc == "" {
		t.Errorf("%s: argument %q says nothing", e.Name, a.Name)
	}
	if n := len(a.Choices); n > 0 {
		if a.Typical < 0 || int(a.Typical) >= n || a.Whole || a.From != 0 || a.To != 0 {
			t.Errorf("%s: choice %s has the marks of a number", e.Name, a.Name)
		}
		return
	}
	if !(a.Min < a.Max) || math.IsInf(a.Min, 0) || math.IsInf(a.Max, 0) {
		t.Errorf("%s: %s ranges from %g to %g", e.Name, a.Name, a.Min, a.Max)
	}
	from, to := a.Window()
	if !(a.Min <= from && from < to && to <= a.Max) {
		t.Errorf("%s: %s is shown from %g to %g", e.Name, a.Name, from, to)
	}
	if u := a.Usual(); !(u >= a.Min && u <= a.Max) {
		t.Errorf("%s: %s is usually %g", e.Name, a.Name, u)
	}
}

func outputIndex(e *Entry, id string) int {
	return slices.IndexFunc(e.Outputs, func(o Output) bool { return o.ID == id })
}

// Just outside each bound every entry refuses, by a RangeError that names the
// argument.
func TestEntriesRefuseWhatIsOutside(t *testing.T) {
	ran := 0
	for _, e := range All() {
		for i := range e.Args {
			a := &e.Args[i]
			outside := []float64{math.Nextafter(a.Min, math.Inf(-1)), math.Nextafter(a.Max, math.Inf(1)), math.Inf(1), math.Inf(-1), math.NaN()}
			switch {
			case len(a.Choices) > 0:
				outside = []float64{-1, 0.5, float64(len(a.Choices)), math.Inf(1)}
			case a.Whole:
				outside = append(outside, a.Min+0.5)
			}
			for _, x := range outside {
				if math.IsNaN(x) && a.Optional {
					continue // stands for the default
				}
				args := usualArgs(e)
				args[i] = x
				var r *RangeError
				if _, err := e.Evaluate(args); !errors.As(err, &r) || r.Function != e.Name || r.Arg != a.Name {
					t.Errorf("%s: %s = %g gives %v, want a RangeError", e.Name, a.Name, x, err)
				}
				ran++
			}
		}
	}
	if ran < 600 {
		t.Errorf("tried %d values, want at least 600", ran)
	}
}

// At the bounds, at their corners and at many points inside, every entry gives
// finite values, or +Inf where it says so, or refuses what does not fit together.
func TestEntriesHoldOnTheirRange(t *testing.T) {
	draw := rand.New(rand.NewPCG(1, 2))
	for _, e := range All() {
		points := 1000
		if isSlow(e) {
			points = 60
		}
		answered := 0
		for i := range e.Args {
			for _, x := range boundsOf(&e.Args[i]) {
				args := usualArgs(e)
				args[i] = x
				answered += checkAnswer(t, e, args)
			}
		}
		for range points {
			args := make([]float64, len(e.Args))
			for i := range e.Args {
				args[i] = drawArg(draw, &e.Args[i])
			}
			answered += checkAnswer(t, e, args)
		}
		if answered < points/20 {
			t.Errorf("%s answers only %d of %d points", e.Name, answered, points)
		}
	}
}

func boundsOf(a *Arg) []float64 {
	if n := len(a.Choices); n > 0 {
		return []float64{0, float64(n - 1)}
	}
	return []float64{a.Min, a.Max}
}

// drawArg draws from the range: the ends now and then, else uniform in the
// logarithm of the distance from zero, or uniform.
func drawArg(r *rand.Rand, a *Arg) float64 {
	if n := len(a.Choices); n > 0 {
		return float64(r.IntN(n))
	}
	var x float64
	switch kind := r.IntN(20); {
	case kind == 0:
		return a.Min
	case kind == 1:
		return a.Max
	case kind < 14 && a.Max > 0:
		low := math.Max(a.Min, a.Max*1e-25)
		x = low * math.Pow(a.Max/low, r.Float64())
		if a.Min < 0 && r.IntN(2) == 0 {
			x *= a.Min / a.Max
		}
	default:
		x = a.Min + (a.Max-a.Min)*r.Float64()
	}
	if a.Whole {
		x = math.Floor(x)
	}
	return math.Min(math.Max(x, a.Min), a.Max)
}

// checkAnswer counts an answer as 1 and a refusal as 0.
func checkAnswer(t *testing.T, e *Entry, args []float64) int {
	t.Helper()
	values, err := e.Evaluate(args)
	var r *RangeError
	if errors.As(err, &r) {
		if r.Function != e.Name || !slices.ContainsFunc(e.Args, func(a Arg) bool { return a.Name == r.Arg }) {
			t.Errorf("%s%v: the refusal names %s of %s", e.Name, args, r.Arg, r.Function)
		}
		return 0
	}
	if err != nil || len(values) != len(e.Outputs) {
		t.Errorf("%s%v: %d values, %v", e.Name, args, len(values), err)
		return 0
	}
	for i, v := range values {
		if math.IsNaN(v) || math.IsInf(v, -1) || math.IsInf(v, 1) && !e.Outputs[i].Unbounded {
			t.Errorf("%s%v: %s = %g", e.Name, args, e.Outputs[i].ID, v)
		}
	}
	return 1
}

// Each limit is reached at its end of the range.
func TestLimitsAreReached(t *testing.T) {
	entries, limits := 0, 0
	for _, e := range All() {
		if len(e.Limits) > 0 {
			entries++
		}
		for _, l := range e.Limits {
			args := usualArgs(e)
			over := e.Sweep()
			args[over] = e.Args[over].Min
			if l.End == High {
				args[over] = e.Args[over].Max
			}
			values, err := e.Evaluate(args)
			if err != nil {
				t.Errorf("%s%v: %v", e.Name, args, err)
				continue
			}
			got, want := values[outputIndex(e, l.Output)], l.Value(args)
			if !(math.Abs(got-want) <= l.Within*math.Abs(want)) {
				t.Errorf("%s, %s: %.12g at %v, limit %.12g", e.Name, l.Name, got, args, want)
			}
			tally(t, e.Name, limitName(l), 1)
			limits++
		}
	}
	if entries < 40 || limits < 80 {
		t.Errorf("%d entries with %d limits", entries, limits)
	}
}

// cliffs are the steps that the physics has, or the record that a solution
// reads: argument and place.
var cliffs = map[string][]struct {
	arg string
	at  float64
}{
	// From mass to resistance at coincidence.
	"FlexuralWaveLoading": {{"s", 1}},
	// The onset of shedding, and the bands at both ends of the drag crisis.
	"Strouhal":     {{"reynolds", SheddingOnset}, {"reynolds", DragCrisisStart}, {"reynolds", DragCrisisEnd}},
	"CylinderDrag": {{"reynolds", DragCrisisStart}, {"reynolds", DragCrisisEnd}},
	// The ends of the table.
	"GallopingFactor": {{"depth_ratio", 1. / 3}, {"depth_ratio", 2}},
	// The upper end of the band goes to infinity.
	"WakeLockIn": {{"am", 1}},
	// A branch ends at its fold, and the next one is the lowest.
	"ConveyingPipe": {{"beta", 0.29722}, {"beta", 0.69537}, {"beta", 0.92464}},
	// The onset goes to infinity, or ends at a fold.
	"SectionFlutter": {{"mu", 1.508}, {"a", -0.61554}, {"x_alpha", -0.17537}, {"frequency_ratio", 1.60836}},
	// No divergence ahead of the quarter chord, no galloping without negative slope.
	"SectionDivergence": {{"e", 0}},
	"GallopingSpeed":    {{"a_g", 0}},
}

// Where one evaluation hands over to another nothing shows: intervals are halved
// towards the larger change until a step remains or nothing does.
func TestNoCliffs(t *testing.T) {
	intervals, found := 0, map[string]int{}
	for _, e := range All() {
		for i := range e.Args {
			a := &e.Args[i]
			if len(a.Choices) > 0 || a.Whole {
				continue
			}
			for _, grid := range cliffGrids(e, a) {
				for k := 1; k < len(grid); k++ {
					intervals++
					at, ok := findCliff(e, i, grid[k-1], grid[k])
					if !ok {
						continue
					}
					if !knownCliff(e.Name, a.Name, at) {
						t.Errorf("%s steps at %s = %.12g", e.Name, a.Name, at)
					}
					found[e.Name]++
				}
			}
		}
	}
	if intervals < 20000 {
		t.Errorf("searched %d intervals, want at least 20000", intervals)
	}
	for name := range cliffs {
		if found[name] == 0 {
			t.Errorf("no step is found in %s", name)
		}
	}
}

func knownCliff(entry, arg string, at float64) bool {
	for _, c := range cliffs[entry] {
		if c.arg == arg && math.Abs(at-c.at) <= math.Max(2e-3*math.Abs(c.at), 1e-12) {
			return true
		}
	}
	return false
}

// cliffGrids spans the range: in the logarithm over all decades, and evenly over
// the window.
func cliffGrids(e *Entry, a *Arg) [][]float64 {
	perDecade, even := 8, 150
	if isSlow(e) {
		perDecade, even = 1, 8
	}
	var grids [][]float64
	if a.Max > 0 {
		low := math.Max(a.Min, math.Min(a.Max*1e-20, 1e-13))
		n := int(math.Ceil(math.Log10(a.Max/low)*float64(perDecade))) + 1
		var grid []float64
		for k := range n + 1 {
			grid = append(grid, math.Min(a.Max, math.Max(a.Min, low*math.Pow(a.Max/low, float64(k)/float64(n)))))
		}
		grids = append(grids, grid)
	}
	from, to := a.Window()
	var grid []float64
	for k := range even + 1 {
		// Off the round numbers, where an optional argument changes the method.
		grid = append(grid, from+(to-from)*float64(k)/float64(even))
	}
	return append(grids, grid)
}

// findCliff halves [lo, hi] towards the larger change. It works on one output at a
// time, relative to the size that it has at the ends.
func findCliff(e *Entry, i int, lo, hi float64) (at float64, found bool) {
	args := usualArgs(e)
	eval := func(x float64) []float64 {
		args[i] = x
		v, err := e.Evaluate(args)
		if err != nil {
			return nil
		}
		return v
	}
	low, high := eval(lo), eval(hi)
	if low == nil || high == nil {
		return 0, false
	}
	for o := range e.Outputs {
		if e.Outputs[o].ID == UncertaintyID || e.Outputs[o].ID == "listed" {
			continue
		}
		size := math.Min(math.Abs(low[o])+math.Abs(high[o]), 1e100)
		if e.Name == "BeamShape" {
			size = 1 // its values are over the largest
		}
		tolerance := 1e-7 * size
		if isSlow(e) {
			tolerance = 1e-5 * size
		}
		if u := outputIndex(e, UncertaintyID); u >= 0 {
			tolerance = math.Max(tolerance, 2*size*math.Max(low[u], high[u]))
		}
		if at, found := halveToCliff(eval, o, lo, hi, low[o], high[o], tolerance); found {
			return at, true
		}
	}
	return 0, false
}

// apart is |a − b|, of which two infinite values have none.
func apart(a, b float64) float64 {
	if a == b {
		return 0
	}
	return math.Min(math.Abs(a-b), math.MaxFloat64)
}

func halveToCliff(eval func(float64) []float64, o int, lo, hi, low, high, tolerance float64) (at float64, found bool) {
	for range 70 {
		if apart(high, low) <= tolerance {
			return 0, false
		}
		middle := lo + (hi-lo)/2
		if !(middle > lo && middle < hi) || hi-lo < 1e-14*math.Abs(hi) {
			return lo, true
		}
		v := eval(middle)
		if v == nil {
			return 0, false
		}
		if apart(v[o], low) >= apart(high, v[o]) {
			hi, high = middle, v[o]
		} else {
			lo, low = middle, v[o]
		}
	}
	return lo, true
}

// A solution that is cut short says by how much, and a better one stays within.
func TestUncertaintyCoversTheError(t *testing.T) {
	type row struct {
		entry string
		args  []float64
		// error is that of the entry's values, against a better solution.
		error func(values []float64) float64
	}
	var rows []row
	for _, modes := range []int{2, 3, 4, 5, 6, 7, 9, 10, 15, 20} {
		for _, aspect := range []float64{0, 0.5, 1, 2, 3} {
			exact := 343.356 // the double zero of the boundary determinant
			if aspect > 0 {
				even, _, _ := panelMeeting(20, aspect)
				odd, _, _ := panelMeeting(21, aspect)
				exact = (even + odd) / 2
			}
			rows = append(rows, row{"PanelFlutter", []float64{float64(modes), aspect}, func(v []float64) float64 {
				return math.Abs(exact/v[0]-1) - 1e-5 // six digits are known
			}})
		}
	}
	for _, r := range stillFluidTable(t, "testdata/still_fluid_reference.csv") {
		if r.name != "ThinFilm" && r.name != "ThinFilmLiquid" {
			continue
		}
		rows = append(rows, row{r.name, r.args, func(v []float64) float64 {
			worst := 0.0
			for i, want := range r.want {
				worst = math.Max(worst, stillFluidError(v[i], want))
			}
			return worst - 3e-13 // rounding
		}})
	}
	for _, a := range [][]float64{{0.1, 0, 0}, {0.2, 0, 0}, {0.6, 0, 0}, {0.2, 10, 0}, {0.5, 10, 0}, {0.2, -5, 0}} {
		want := pipeCheckValue(t, a)
		rows = append(rows, row{"ConveyingPipe", a, func(v []float64) float64 { return math.Abs(v[0]/want-1) - 1e-11 }}) // the table's last digit
	}
	for _, k0 := range []float64{0, 1, 7, 40} {
		rows = append(rows, row{"BaffledPlateMode", []float64{2, 0, 1.3, 3, 2, k0}, func(v []float64) float64 {
			x, y := newBeamFunction(ClampedClamped, 3), newBeamFunction(PinnedPinned, 2)
			return math.Abs(baffledMass(&x, &y, 1/1.3, k0, 3) - v[0])
		}})
		rows = append(rows, row{"BaffledCircularPlateMode", []float64{1, 2, 1, 0.3, k0}, func(v []float64) float64 {
			if k0 == 0 {
				return 0
			}
			λ := discRoot(CircularSimplySupported, 2, 1, 0.3)
			shape := discModeShapeIn(60, CircularSimplySupported, λ, 1, 0.3)
			return math.Abs(shape.baffledMass(k0, λ, 4) - v[0])
		}})
	}
	for _, mode := range [][2]float64{{0, 0}, {3, 2}, {10, 10}} {
		rows = append(rows, row{"CircularPlateAddedMass", []float64{0, mode[0], mode[1]}, func(v []float64) float64 {
			λ := discRoot(CircularClamped, int(mode[0]), int(mode[1]), 0.3)
			shape := discModeShapeIn(70, CircularClamped, λ, int(mode[1]), 0.3)
			return math.Abs(shape.addedMass()/v[0]-1) - 1e-13 // rounding
		}})
	}
	seen := map[string]bool{}
	for _, r := range rows {
		e := Find(r.entry)
		v, err := e.Evaluate(r.args)
		if err != nil {
			t.Errorf("%s%v: %v", r.entry, r.args, err)
			continue
		}
		δ := v[outputIndex(e, UncertaintyID)]
		if off := r.error(v); !(off <= δ) || !(δ >= 0 && δ < 1) {
			t.Errorf("%s%v: off by %.2g, uncertainty %.2g", r.entry, r.args, off, δ)
		}
		seen[r.entry] = true
	}
	for _, e := range All() {
		// PlateMode has a test of its own, against larger sets.
		if outputIndex(e, UncertaintyID) >= 0 && !seen[e.Name] && e.Name != "PlateMode" {
			t.Errorf("%s: its uncertainty is not tested", e.Name)
		}
	}
	if len(rows) < 120 {
		t.Errorf("ran %d rows, want at least 120", len(rows))
	}
}

// pipeCheckValue is the critical speed of the table for these arguments.
func pipeCheckValue(t *testing.T, args []float64) float64 {
	t.Helper()
	for _, row := range stillFluidTable(t, "testdata/canon.csv") {
		if row.name == "ConveyingPipe.cantilever" && slices.Equal(row.args, args) {
			return row.want[0]
		}
	}
	t.Fatalf("no row for %v", args)
	return 0
}

// The docstring of a function says, in this order: equation, symbols with units,
// range, accuracy, check value, source.
func TestDocstringsKeepTheirOrder(t *testing.T) {
	docs := functionDocs(t)
	// Entries that are put together from the functions named.
	parts := map[string][]string{"VortexAmplitude": {"SkopGriffin", "SkopGriffinParameter", "GovardhanWilliamson"}, "StokesSecondOrder": {"StokesSecondOrder", "Ursell"}}
	ran := 0
	for _, e := range All() {
		names := parts[e.Name]
		if names == nil {
			names = []string{e.Name}
		}
		for _, name := range names {
			doc, ok := docs[name]
			if !ok {
				t.Errorf("no function %s", name)
				continue
			}
			last := -1
			for _, mark := range []string{"=", "Range:", "Accuracy:", "Check", "Source:"} {
				at := strings.Index(doc, mark)
				if mark == "=" && at < 0 {
					at = strings.Index(doc, "<") // a band, a curve by table
				}
				if at <= last {
					t.Errorf("%s: %q does not stand where it should", name, mark)
				}
				last = max(last, at)
			}
			ran++
		}
	}
	if ran != 69 {
		t.Errorf("read %d docstrings, want 69", ran)
	}
}

func functionDocs(t *testing.T) map[string]string {
	t.Helper()
	paths, err := filepath.Glob("*.go")
	if err != nil {
		t.Fatal(err)
	}
	docs := map[string]string{}
	for _, path := range paths {
		if strings.HasSuffix(path, "_test.go") {
			continue
		}
		file, err := parser.ParseFile(token.NewFileSet(), path, nil, parser.ParseComments)
		if err != nil {
			t.Fatal(err)
		}
		for _, d := range file.Decls {
			if f, ok := d.(*ast.FuncDecl); ok && f.Recv == nil {
				docs[f.Name.Name] = f.Doc.Text()
			}
		}
	}
	return docs
}
