package units

import (
	"errors"
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestDampingForms(t *testing.T) {
	rows := []struct {
		f           DampingForm
		value, want float64
	}{
		{DampingRatio, 0, 0}, {DampingRatio, 0.02, 0.02}, {LogDecrement, 2 * math.Pi / math.Sqrt(3), 0.5}, {LogDecrement, 0, 0},
		{LossFactor, 0.04, 0.02}, {QualityFactor, 25, 0.02},
	}
	for _, r := range rows {
		got, err := r.f.Ratio(r.value)
		if err != nil || math.Abs(got-r.want) > 1e-15 {
			t.Errorf("%s %g: %g, %v", r.f, r.value, got, err)
		}
	}
	if len(rows) != 6 || len(DampingForms()) != int(dampingFormCount) {
		t.Errorf("%d rows", len(rows))
	}
}

func TestDampingFormsRefuse(t *testing.T) {
	rows := []struct {
		f          DampingForm
		value      float64
		suggestion string
	}{
		{DampingRatio, 2, "2 %"}, {DampingRatio, 1, "1 %"}, {DampingRatio, -0.1, ""}, {DampingRatio, 150, ""}, {DampingRatio, math.NaN(), ""},
		{LogDecrement, -1, ""}, {LogDecrement, math.Inf(1), ""}, {LossFactor, 3, "3 %"}, {LossFactor, 2, "2 %"}, {QualityFactor, 0.5, ""},
		{QualityFactor, 0, ""}, {DampingForm(9), 0.1, ""},
	}
	for _, r := range rows {
		_, err := r.f.Ratio(r.value)
		var e *Error
		if !errors.As(err, &e) || e.Code != CodeRange || e.Suggestion != r.suggestion || e.Error() == "" {
			t.Errorf("%s %g: %v", r.f, r.value, err)
		}
	}
	if len(rows) != 12 {
		t.Errorf("%d rows", len(rows))
	}
}

// The decrement is the fall of the free oscillation over one of its periods.
func TestDecrementIsThatOfTheDecay(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		ζ := rapid.Float64Range(0, 0.99).Draw(t, "ζ")
		period := 2 * math.Pi / math.Sqrt(1-ζ*ζ)
		Δ := ζ * period
		got, err := LogDecrement.Ratio(Δ)
		if err != nil || math.Abs(got-ζ) > 1e-14 {
			t.Fatalf("%g: %g, %v", ζ, got, err)
		}
		loss, _ := LossFactor.Ratio(2 * ζ)
		if math.Abs(loss-ζ) > 1e-15 {
			t.Fatalf("loss factor: %g", loss)
		}
		if ζ < 1e-6 {
			return
		}
		if quality, _ := QualityFactor.Ratio(1 / (2 * ζ)); math.Abs(quality-ζ) > 1e-14 {
			t.Fatalf("quality factor: %g", quality)
		}
	})
}
