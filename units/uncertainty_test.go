package units

import (
	"errors"
	"math"
	"testing"
)

func TestUncertaintyForms(t *testing.T) {
	rows := []struct {
		text          string
		k             Kind
		form          Form
		value, spread float64
		unit          string
	}{
		{"2.1 m/s", Speed, Certain, 2.1, 0, "m/s"},
		{"2.1 +- 0.2 m/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"2.1+-0.2m/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"2.1 +/- 0.2 m/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"2.1 ± 0.2 m/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"2.1±0.2 m/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"2.1 m/s +- 10 %", Speed, Normal, 2.1, 0.21, "m/s"},
		{"2.1 m/s ±10%", Speed, Normal, 2.1, 0.21, "m/s"},
		{"-2.1 m/s +- 10 %", Speed, Normal, -2.1, 0.21, "m/s"},
		{"2.1 m/s +- 0.2 m/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"2.1 m/s +- 20 cm/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"(2.1 +- 0.2) m/s", Speed, Normal, 2.1, 0.2, "m/s"},
		{"(2.1 ± 10 %) m/s", Speed, Normal, 2.1, 0.21, "m/s"},
		{"1.8 .. 2.4 m/s", Speed, Uniform, 2.1, 0.3, "m/s"},
		{"1.8..2.4 m/s", Speed, Uniform, 2.1, 0.3, "m/s"},
		{"1.8 … 2.4 m/s", Speed, Uniform, 2.1, 0.3, "m/s"},
		{"1.8 ... 2.4 m/s", Speed, Uniform, 2.1, 0.3, "m/s"},
		{"(1.8 .. 2.4) m/s", Speed, Uniform, 2.1, 0.3, "m/s"},
		{"1.8 m/s .. 2.4 m/s", Speed, Uniform, 2.1, 0.3, "m/s"},
		{"180 cm/s .. 2.4 m/s", Speed, Uniform, 2.1, 0.3, "cm/s"},
		{"-1 .. 1 m/s", Speed, Uniform, 0, 1, "m/s"},
		{"1e-3 .. 3e-3 m", Length, Uniform, 2e-3, 1e-3, "m"},
		{"2 +- 0 m/s", Speed, Certain, 2, 0, "m/s"},
		{"2 .. 2 m/s", Speed, Certain, 2, 0, "m/s"},
		{"0 m/s +- 10 %", Speed, Certain, 0, 0, "m/s"},
		{"20 +- 2 degC", Temperature, Normal, 293.15, 2, "degC"},
		{"20 degC +- 2 K", Temperature, Normal, 293.15, 2, "degC"},
		{"68 +- 9 degF", Temperature, Normal, 293.15, 5, "degF"},
		{"300 K +- 1 %", Temperature, Normal, 300, 3, "K"},
		{"10 .. 30 degC", Temperature, Uniform, 293.15, 10, "degC"},
		{"12 +- 0.6 Hz", Frequency, Normal, 12, 0.6, "Hz"},
		{"600 .. 1200 rpm", Frequency, Uniform, 15, 5, "rpm"},
		{"2 +- 0.1 barg", Pressure, Normal, 2e5, 1e4, "barg"},
		{"2 barg +- 0.1 bar", Pressure, Normal, 2e5, 1e4, "barg"},
		{"0.3 +- 0.02", Dimensionless, Normal, 0.3, 0.02, ""},
		{"0.3 +- 10 %", Dimensionless, Normal, 0.3, 0.03, ""},
		{"(0.3 +- 0.02)", Dimensionless, Normal, 0.3, 0.02, ""},
		{"(2 +- 0.5) %", Damping, Normal, 0.02, 0.005, "%"},
		{"(2 +- 10 %) %", Damping, Normal, 0.02, 0.002, "%"},
		{"1 .. 3 %", Damping, Uniform, 0.02, 0.01, "%"},
		{"0.01 .. 0.03", Damping, Uniform, 0.02, 0.01, ""},
		{"35 +- 1 g/kg", Salinity, Normal, 35, 1, "g/kg"},
		{"3.4 .. 3.6 %", Salinity, Uniform, 35, 1, "%"},
	}
	ran := 0
	for _, r := range rows {
		ran++
		q, err := Parse(r.text, r.k)
		if err != nil {
			t.Errorf("%s: %v", r.text, err)
			continue
		}
		near := func(a, b float64) bool { return math.Abs(a-b) <= 1e-12*max(1, math.Abs(b)) }
		if q.Form != r.form || !near(q.Value, r.value) || !near(q.Spread, r.spread) || q.Unit != r.unit {
			t.Errorf("%s: %+v", r.text, q)
		}
		if q.Form == Uniform && (!near(q.Low(), r.value-r.spread) || !near(q.High(), r.value+r.spread)) {
			t.Errorf("%s: from %g to %g", r.text, q.Low(), q.High())
		}
		if q.Form != Uniform && (q.Low() != q.Value || q.High() != q.Value) {
			t.Errorf("%s: has ends", r.text)
		}
	}
	if ran != 43 {
		t.Errorf("%d rows", ran)
	}
}

func TestUncertaintyRefused(t *testing.T) {
	rows := []struct {
		text string
		k    Kind
		code Code
	}{
		{"2 +- -0.2 m/s", Speed, CodeNegativeSpread}, {"2 m/s +- -5 %", Speed, CodeNegativeSpread}, {"2.4 .. 1.8 m/s", Speed, CodeBadRange}, {"1 .. 1 mm +- 1 mm", Length, CodeSyntax},
		{"2 m/s +- 0.2", Speed, CodeMissingUnit}, {"2 m/s .. 3", Speed, CodeMissingUnit}, {"2 +- 0.2", Speed, CodeMissingUnit}, {"2 .. 3", Speed, CodeMissingUnit}, {"2 +- 10 %", Speed, CodeMissingUnit},
		{"2 +- 10 % m/s", Speed, CodeSyntax}, {"2 m/s +- 10 % m/s", Speed, CodeSyntax}, {"5 % +- 1 %", Dimensionless, CodeAmbiguousUnit}, {"20 degC +- 10 %", Temperature, CodeSyntax}, {"(20 +- 10 %) degC", Temperature, CodeSyntax},
		{"2 +- 0.2 s", Speed, CodeWrongDimension}, {"2 m/s +- 0.2 s", Speed, CodeWrongDimension}, {"2 m/s +- 1 foo", Speed, CodeUnknownUnit}, {"2 s .. 3 m/s", Speed, CodeWrongDimension},
		{"2 +- m/s", Speed, CodeSyntax}, {"+- 2 m/s", Speed, CodeSyntax}, {"2 .. m/s", Speed, CodeSyntax}, {".. 2 m/s", Speed, CodeSyntax}, {"2 +- 1 +- 1 m/s", Speed, CodeSyntax}, {"1 .. 2 .. 3 m/s", Speed, CodeSyntax},
		{"1....2 m/s", Speed, CodeSyntax},
		{"(2 +- 1 m/s", Speed, CodeSyntax}, {"(2 +- 1)", Speed, CodeMissingUnit}, {"(2 m/s +- 1) m/s", Speed, CodeSyntax}, {"(2 +- 1 m/s) m/s", Speed, CodeSyntax}, {"(1 % .. 2 %) m/s", Speed, CodeSyntax},
		{"1 barg .. 2 bar", Pressure, CodeWrongKind}, {"1 .. 1e400 m", Length, CodeNotFinite}, {"1 +- 1e400 m", Length, CodeNotFinite}, {"1 +- nan m", Length, CodeNotFinite}, {"1 +- 1e308 km", Length, CodeNotFinite}, {"-300 .. 20 degC", Temperature, CodeBelowZero},
	}
	ran := 0
	for _, r := range rows {
		ran++
		q, err := Parse(r.text, r.k)
		var e *Error
		if !errors.As(err, &e) || e.Code != r.code {
			t.Errorf("%s: %+v, %v, want %s", r.text, q, err, r.code)
			continue
		}
		if q != (Quantity{}) {
			t.Errorf("%s: an error with a value", r.text)
		}
		sentence(t, e)
	}
	if ran != 36 {
		t.Errorf("%d rows", ran)
	}
}

func TestObjects(t *testing.T) {
	p := func(x float64) *float64 { return &x }
	accepted := []struct {
		o    Object
		k    Kind
		like string
	}{
		{Object{Value: p(2.1), Unit: "m/s"}, Speed, "2.1 m/s"},
		{Object{Value: p(2.1), Std: p(0.2), Unit: " m/s "}, Speed, "2.1 +- 0.2 m/s"},
		{Object{Value: p(2.1), Percent: p(10), Unit: "m/s"}, Speed, "2.1 m/s +- 10 %"},
		{Object{Low: p(1.8), High: p(2.4), Unit: "m/s"}, Speed, "1.8 .. 2.4 m/s"},
		{Object{Value: p(0.3)}, Dimensionless, "0.3"},
		{Object{Value: p(0.3), Std: p(0.1)}, Dimensionless, "0.3 +- 0.1"},
		{Object{Value: p(2), Std: p(0.5), Unit: "%"}, Damping, "(2 +- 0.5) %"},
		{Object{Value: p(20), Std: p(2), Unit: "degC"}, Temperature, "20 +- 2 degC"},
		{Object{Low: p(1), High: p(3), Unit: "barg"}, Pressure, "1 .. 3 barg"},
	}
	for _, r := range accepted {
		q, err := FromObject(r.o, r.k)
		want, wantErr := Parse(r.like, r.k)
		if err != nil || wantErr != nil || q != want {
			t.Errorf("%s: %+v, %v", r.like, q, err)
		}
	}
	refused := []struct {
		o    Object
		code Code
	}{
		{Object{}, CodeSyntax}, {Object{Unit: "m"}, CodeSyntax}, {Object{Low: p(1), Unit: "m"}, CodeSyntax}, {Object{High: p(1), Unit: "m"}, CodeSyntax}, {Object{Std: p(1), Unit: "m"}, CodeSyntax},
		{Object{Value: p(1), Low: p(1), High: p(2), Unit: "m"}, CodeSyntax}, {Object{Value: p(1), Std: p(1), Percent: p(1), Unit: "m"}, CodeSyntax}, {Object{Low: p(1), High: p(2), Std: p(1), Unit: "m"}, CodeSyntax},
		{Object{Value: p(1)}, CodeMissingUnit}, {Object{Low: p(1), High: p(2)}, CodeMissingUnit}, {Object{Value: p(1), Unit: "s"}, CodeWrongDimension}, {Object{Value: p(1), Unit: "M"}, CodeUnknownUnit},
		{Object{Value: p(1), Std: p(-1), Unit: "m"}, CodeNegativeSpread}, {Object{Value: p(1), Percent: p(-1), Unit: "m"}, CodeNegativeSpread}, {Object{Low: p(2), High: p(1), Unit: "m"}, CodeBadRange},
		{Object{Value: p(math.NaN()), Unit: "m"}, CodeNotFinite}, {Object{Value: p(1), Std: p(math.Inf(1)), Unit: "m"}, CodeNotFinite}, {Object{Value: p(1), Std: p(math.NaN()), Unit: "m"}, CodeNotFinite},
		{Object{Low: p(math.NaN()), High: p(1), Unit: "m"}, CodeNotFinite}, {Object{Value: p(1), Percent: p(math.NaN()), Unit: "m"}, CodeNotFinite}, {Object{Value: p(1), Unit: string(make([]byte, 1000))}, CodeSyntax},
	}
	for _, r := range refused {
		_, err := FromObject(r.o, Length)
		var e *Error
		if !errors.As(err, &e) || e.Code != r.code {
			t.Errorf("%+v: %v, want %s", r.o, err, r.code)
			continue
		}
		sentence(t, e)
	}
	if len(accepted) != 9 || len(refused) != 21 {
		t.Errorf("%d and %d rows", len(accepted), len(refused))
	}
	for form, name := range map[Form]string{Certain: "certain", Normal: "normal", Uniform: "uniform", Form(7): "unknown form"} {
		if form.String() != name {
			t.Error(form)
		}
	}
}
