package canon

import (
	"errors"
	"math"
	"testing"

	"pgregory.net/rapid"
)

func TestStructureEntriesAreComplete(t *testing.T) {
	names := map[string]bool{}
	for _, e := range structureEntries {
		if names[e.Name] {
			t.Errorf("%s is listed twice", e.Name)
		}
		names[e.Name] = true
		if e.Problem == "" || e.Equation == "" || len(e.Args) == 0 || len(e.Outputs) == 0 || len(e.Sources) == 0 || e.Factor < 1 || !(e.Accuracy > 0) {
			t.Errorf("%s is incomplete", e.Name)
		}
		for _, a := range e.Args {
			if a.Name == "" || a.Doc == "" || len(a.Choices) == 0 && !(a.Min < a.Max) || math.IsInf(a.Max, 0) {
				t.Errorf("%s: argument %q is incomplete", e.Name, a.Name)
			}
			if a.Optional && len(a.Choices) == 0 && !(a.Min <= a.Default && a.Default <= a.Max) {
				t.Errorf("%s: default of %q is out of range", e.Name, a.Name)
			}
		}
	}
	if len(names) != 16 {
		t.Errorf("%d entries", len(names))
	}
	if len(plateEdgeNames) != 81 || plateEdgeNames[0] != "SSSS" {
		t.Errorf("%d combinations of edges from %s", len(plateEdgeNames), plateEdgeNames[0])
	}
}

// TestStructureEntriesAnswerOrRefuse draws arguments from the stated ranges, ends
// included: the answer is finite numbers as announced, or a RangeError.
func TestStructureEntriesAnswerOrRefuse(t *testing.T) {
	answered := map[string]int{}
	var names []string
	for _, e := range structureEntries {
		names = append(names, e.Name)
	}
	rapid.Check(t, func(t *rapid.T) {
		e := structureEntryNamed(rapid.SampledFrom(names).Draw(t, "entry"))
		args := make([]float64, len(e.Args))
		for i, a := range e.Args {
			args[i] = drawStructureArg(t, a)
		}
		values, err := e.Evaluate(args)
		var outside *RangeError
		if errors.As(err, &outside) {
			return
		}
		if err != nil {
			t.Fatal(err)
		}
		answered[e.Name]++
		if len(values) != len(e.Outputs) {
			t.Fatalf("%d values", len(values))
		}
		for _, v := range values {
			if math.IsNaN(v) || math.IsInf(v, 0) {
				t.Fatalf("%s%v = %v", e.Name, args, values)
			}
		}
	})
	t.Logf("answered: %v", answered)
}

func drawStructureArg(t *rapid.T, a Arg) float64 {
	if n := len(a.Choices); n > 0 {
		return float64(rapid.IntRange(0, n-1).Draw(t, a.Name))
	}
	switch rapid.IntRange(0, 4).Draw(t, "where") {
	case 0:
		return a.Min
	case 1:
		return a.Max
	case 2:
		return math.Min(math.Max(a.Min, float64(rapid.IntRange(0, 12).Draw(t, a.Name))), a.Max)
	case 3:
		return math.Floor(rapid.Float64Range(a.Min, a.Max).Draw(t, a.Name))
	}
	return rapid.Float64Range(a.Min, a.Max).Draw(t, a.Name)
}

func TestStructureEntriesRefuseFractionsOfModes(t *testing.T) {
	rows := map[string][]float64{
		"BeamMode": {0, 1.5}, "BeamShape": {0, 1.5, 0.2}, "BeamModeFactors": {0, 1.5}, "ElasticBeamMode": {1, 1, 0, 1, 1, 0, 1.5},
		"TensionedBeam": {0, 1.5, 1}, "PlateMode": {0, 1, 1.5, 1}, "CircularPlateMode": {0, 1.5}, "ElasticCircularPlateMode": {1, 1.5},
		"CircularPlateAddedMass": {0, 1.5}, "BaffledCircularPlateMode": {0, 1.5}, "BaffledPlateMode": {0, 0, 1, 1.5, 1},
		"CavityStiffness": {0, 0, 1.5, 1}, "StringMode": {1.5}, "RingMode": {2.5},
	}
	ran := 0
	for _, e := range structureEntries {
		args, ok := rows[e.Name]
		if !ok {
			continue
		}
		var outside *RangeError
		if _, err := e.Evaluate(args); !errors.As(err, &outside) {
			t.Errorf("%s%v: %v", e.Name, args, err)
		}
		ran++
	}
	if ran != 14 {
		t.Errorf("ran %d rows", ran)
	}
}

func TestStructureEntriesAgreeWithTheirFunctions(t *testing.T) {
	rows := []struct {
		name string
		args []float64
		want float64
	}{
		{"BeamMode", []float64{1, 1}, 1.875104068712},
		{"BeamShape", []float64{1, 1, 1}, 1},
		{"BeamModeFactors", []float64{1, 1}, 0.391495878},
		{"ElasticBeamMode", []float64{1e12, 1e12, 0, 10, 0, 0, 1}, 2.638924696},
		{"TensionedBeam", []float64{0, 1, 3 * math.Pi * math.Pi}, 2},
		{"PlateMode", []float64{0, 1, 1, 1}, 2 * math.Pi * math.Pi},
		{"CircularPlateMode", []float64{0, 0}, 10.215826230},
		{"ElasticCircularPlateMode", []float64{1e12, 0}, 10.215826230},
		{"LargeAmplitude", []float64{3, 1}, 1.40235612},
		{"CircularPlateAddedMass", []float64{0, 0}, 0.653804},
		{"BaffledCircularPlateMode", []float64{0, 0}, 0.653804},
		{"BaffledPlateMode", []float64{0, 0, 1, 1, 1}, 0.409496},
		{"CavityStiffness", []float64{0, 0, 1, 1}, 0.657022},
		{"StringMode", []float64{2}, 2 * math.Pi},
		{"RingMode", []float64{2}, 2.683281573},
		{"BreathingTube", []float64{1}, 1.048284837},
	}
	ran := 0
	for _, r := range rows {
		e := structureEntryNamed(r.name)
		values, err := e.Evaluate(r.args)
		if err != nil {
			t.Errorf("%s: %v", r.name, err)
			continue
		}
		structureClose(t, r.name, values[0], r.want, 1e-6)
		ran++
	}
	if ran != len(structureEntries) {
		t.Errorf("ran %d rows of %d", ran, len(structureEntries))
	}
}

func structureEntryNamed(name string) *Entry {
	for _, e := range structureEntries {
		if e.Name == name {
			return e
		}
	}
	return &Entry{Name: name}
}
