// Package finding judges assumptions: an estimate of the error that an
// assumption costs goes in, a verdict comes out. There is one verdict function,
// Judge; everything else only estimates.
package finding

import "math"

// Measure says what goes wrong when an assumption is false.
type Measure uint8

// The measures.
const (
	Frequency Measure = iota // relative error of the coupled natural frequency
	Response                 // share of the total damping that is left out
	Load                     // relative error of the fluid load or of the deflection it causes
	Stability                // demand over capacity
	Sound                    // the radiated sound itself
	Scale                    // a ratio of scales that bounds where the description holds
	measures
)

var measureNames = [measures]string{"frequency", "response", "load", "stability", "sound", "scale"}

func (m Measure) String() string { return measureNames[m] }

// MeasureNames lists the measures by name, in order.
func MeasureNames() []string { return append([]string(nil), measureNames[:]...) }

// FindMeasure returns the measure of that name.
func FindMeasure(name string) (Measure, bool) {
	for i, n := range measureNames {
		if n == name {
			return Measure(i), true
		}
	}
	return 0, false
}

// Interest is the set of measures that count in a study.
type Interest uint8

// DefaultInterest counts frequency, load, stability and scale.
const DefaultInterest = Interest(1<<Frequency | 1<<Load | 1<<Stability | 1<<Scale)

// With returns the set with a measure added.
func (i Interest) With(m Measure) Interest { return i | 1<<m }

// Has reports whether a measure counts. Scale always does.
func (i Interest) Has(m Measure) bool { return m == Scale || i&(1<<m) != 0 }

// Tolerance is the error that the analyst accepts, by measure.
type Tolerance struct {
	Name                      string // name of the preset, or "own"
	Frequency, Load, Response float64
}

// Presets are the tolerances by name; the first is the default.
var Presets = []Tolerance{
	{"design", 0.05, 0.10, 0.20},
	{"screening", 0.10, 0.20, 0.50},
	{"detailed", 0.01, 0.03, 0.10},
}

// FindPreset returns the preset of that name.
func FindPreset(name string) (Tolerance, bool) {
	for _, p := range Presets {
		if p.Name == name {
			return p, true
		}
	}
	return Tolerance{}, false
}

// Limit returns the limit of a measure: stability and scale have the limit 1
// unless a source sets another, sound has that of load.
func (t *Tolerance) Limit(m Measure) float64 {
	switch m {
	case Frequency:
		return t.Frequency
	case Response:
		return t.Response
	case Load, Sound:
		return t.Load
	default:
		return 1
	}
}

// Verdict is the outcome of one assumption.
type Verdict uint8

// The verdicts.
const (
	NotApplicable Verdict = iota // the effect cannot occur in this case
	Valid
	Marginal
	Undetermined // an input is missing
	Invalid
)

func (v Verdict) String() string {
	return [...]string{"not-applicable", "valid", "marginal", "undetermined", "invalid"}[v]
}

// VerdictNames lists the verdicts by name.
func VerdictNames() []string {
	return []string{"not-applicable", "valid", "marginal", "undetermined", "invalid"}
}

// Bounds of a utilisation: a threshold that vanishes, or an effect that is
// exactly nil, must not make an infinity.
const (
	LeastUtilisation = 1e-6
	MostUtilisation  = 1e6
)

// Utilisation returns e/ℓ kept within 1e-6 … 1e6.
func Utilisation(estimate, limit float64) float64 {
	u := estimate / limit
	if math.IsNaN(u) || u < LeastUtilisation { // 0/0: nothing is left out
		return LeastUtilisation
	}
	return math.Min(u, MostUtilisation)
}

// Margin returns −log10 of a utilisation: decades to spare.
func Margin(utilisation float64) float64 { return -math.Log10(utilisation) }

// Judge is the verdict function: φ is the model-form factor; inner is the
// factor used in the test for invalid, which for a narrow band is smaller.
//
//	valid     u·φ ≤ 1
//	marginal  u/φ ≤ 1 < u·φ
//	invalid   u/φ > 1
//
// with ≤ to nine digits, so that a case on the very edge gets the same verdict in
// any units.
func Judge(utilisation, factor, inner float64) Verdict {
	const edge = 1 + 1e-9
	switch {
	case utilisation*factor <= edge:
		return Valid
	case utilisation/inner <= edge:
		return Marginal
	default:
		return Invalid
	}
}

// Band returns the utilisation of a group x against a band lo … hi in which a
// hazard acts: min(x/lo, hi/x), 1 at either edge and above 1 inside; and the
// factor for the test of invalid, min(φ, (hi/lo)^¼), which makes the inner half
// of any band, in log x, invalid. A band without upper end has hi = +Inf.
func Band(x, lo, hi, factor float64) (utilisation, inner float64) {
	inner = factor
	utilisation = x / lo
	if math.IsInf(hi, 1) {
		return utilisation, inner
	}
	if r := hi / x; r < utilisation {
		utilisation = r
	}
	return utilisation, math.Min(factor, math.Sqrt(math.Sqrt(hi/lo)))
}
