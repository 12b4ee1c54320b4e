package units

import "math"

// DampingForm is one of the numbers by which the damping of a mode is given.
type DampingForm uint8

// The forms of damping.
const (
	DampingRatio  DampingForm = iota // ζ
	LogDecrement                     // Δ
	LossFactor                       // η
	QualityFactor                    // Q

	dampingFormCount
)

var dampingForms = [dampingFormCount]string{"damping_ratio", "log_decrement", "loss_factor", "quality_factor"}

// String is the name of the form: "damping_ratio".
func (f DampingForm) String() string {
	if f >= dampingFormCount {
		return "unknown form of damping"
	}
	return dampingForms[f]
}

// DampingForms lists all forms.
func DampingForms() []DampingForm {
	return []DampingForm{DampingRatio, LogDecrement, LossFactor, QualityFactor}
}

// Ratio is the damping ratio that a value of this form stands for.
//
//	ζ = Δ/√(4π² + Δ²) = η/2 = 1/(2Q)
//
// Symbols: ζ damping ratio, Δ logarithmic decrement of successive amplitudes, η
// loss factor, Q quality factor; all pure numbers.
// Range: 0 ≤ ζ < 1, hence Δ ≥ 0, 0 ≤ η < 2, Q > 1/2; anything else is an error.
// Accuracy: the decrement is exact for a linear oscillator, the loss and quality
// factors are exact at its resonance.
// Check value: Δ = 2π/√3 gives ζ = 1/2.
// Source: the decaying oscillation exp(−ζωt)·cos(√(1−ζ²)ωt), whose amplitude falls by exp(−2πζ/√(1−ζ²)) each cycle.
func (f DampingForm) Ratio(value float64) (float64, error) {
	ζ := f.ratio(value)
	if ζ >= 0 && ζ < 1 {
		return ζ, nil
	}
	e := &Error{
		Code: CodeRange, Got: string(AppendNumber(nil, value, 4)), Want: "a " + f.String() + " that means less than critical damping",
		Detail: "as a " + f.String() + " this is not below critical damping",
	}
	// A percentage written without its sign is the usual mistake.
	if per := f.ratio(value / 100); value >= 1 && f != QualityFactor && per < 1 {
		e.Suggestion = e.Got + " %"
	}
	return 0, e
}

func (f DampingForm) ratio(value float64) float64 {
	switch {
	case value < 0:
		return -1
	case f == DampingRatio:
		return value
	case f == LogDecrement:
		return value / math.Hypot(2*math.Pi, value)
	case f == LossFactor:
		return value / 2
	case f == QualityFactor && value > 0:
		return 1 / (2 * value)
	}
	return -1
}
