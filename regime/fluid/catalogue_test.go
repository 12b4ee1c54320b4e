package fluid

import (
	"errors"
	"math"
	"regexp"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime/cite"
)

var wantedNames = []string{
	"water", "seawater", "air", "steam", "nitrogen", "helium", "hydrogen", "methane", "carbon-dioxide", "argon",
	"oil-iso-vg-32", "oil-iso-vg-46", "oil-iso-vg-68", "glycol-50", "blood", "mercury", "sodium", "lead-bismuth",
}

func TestCatalogueIsComplete(t *testing.T) {
	if got := Names(); !slices.Equal(got, wantedNames) {
		t.Errorf("names %v, want %v", got, wantedNames)
	}
	name := regexp.MustCompile(`^[a-z]+(-[a-z0-9]+)*$`)
	seen := map[string]bool{}
	for _, m := range All() {
		if !name.MatchString(m.Name) || seen[m.Name] {
			t.Errorf("name %q is malformed or given twice", m.Name)
		}
		seen[m.Name] = true
		if Find(m.Name) != m {
			t.Errorf("%s is not found by its name", m.Name)
		}
		if m.Title == "" || m.Note == "" || m.Phase == Unknown || m.eval == nil {
			t.Errorf("%s lacks title, note, phase or formula", m.Name)
		}
		checkSources(t, m)
		checkRange(t, m)
		if _, err := m.At(m.Default); err != nil {
			t.Errorf("default state: %v", err)
		}
	}
	if Find("no such fluid") != nil {
		t.Error("found a fluid that is not there")
	}
}

func checkSources(t *testing.T, m *Model) {
	t.Helper()
	if len(m.Sources) == 0 {
		t.Errorf("%s lacks a source", m.Name)
	}
	for _, s := range m.Sources {
		if s == nil || cite.ByID(s.ID) != s {
			t.Errorf("%s has a source outside the bibliography", m.Name)
		}
	}
}

func checkRange(t *testing.T, m *Model) {
	t.Helper()
	r := m.Range
	for _, i := range []Interval{r.Temperature, r.Pressure} {
		if !(i.Min > 0 && i.Max > i.Min && !math.IsInf(i.Max, 0)) {
			t.Errorf("%s: range %+v is empty or unbounded", m.Name, i)
		}
	}
	if m.UsesSalinity != (r.Salinity.Max > r.Salinity.Min) {
		t.Errorf("%s: range of salinity %+v does not fit its use", m.Name, r.Salinity)
	}
}

// The typical values are marked as such, and only they.
func TestTypicalIsMarked(t *testing.T) {
	count := 0
	for i, m := range All() {
		if m.Typical != (i >= slices.Index(wantedNames, "oil-iso-vg-32")) {
			t.Errorf("%s: typical is %v", m.Name, m.Typical)
		}
		if m.Typical {
			count++
		}
	}
	if count != 8 {
		t.Errorf("%d typical fluids, want 8", count)
	}
}

// promised is what a model gives over its whole range; the rest is NaN.
func promised(m *Model) []string {
	all := []string{"density", "viscosity", "sound speed", "bulk modulus"}
	switch {
	case m.Phase == Gas:
		return append(all, "heat capacity ratio", "Prandtl number")
	case m.Name == "water":
		return append(all, "vapour pressure", "surface tension", "heat capacity ratio")
	case strings.HasPrefix(m.Name, "oil-"):
		return append(all, "surface tension")
	}
	return append(all, "vapour pressure", "surface tension")
}

func values(p Properties) map[string]float64 {
	return map[string]float64{
		"density": p.Density, "viscosity": p.Viscosity, "sound speed": p.SoundSpeed, "bulk modulus": p.BulkModulus,
		"vapour pressure": p.VapourPressure, "surface tension": p.SurfaceTension,
		"heat capacity ratio": p.HeatCapacityRatio, "Prandtl number": p.Prandtl,
	}
}

func checkPromise(m *Model, p Properties) []string {
	var broken []string
	promise := promised(m)
	for name, v := range values(p) {
		good := v > 0 && !math.IsInf(v, 0)
		if !slices.Contains(promise, name) {
			good = math.IsNaN(v)
		}
		if !good {
			broken = append(broken, name)
		}
	}
	if p.Phase != m.Phase {
		broken = append(broken, "phase")
	}
	return broken
}

func between(i Interval, share float64) float64 {
	switch share {
	case 0:
		return i.Min
	case 1:
		return i.Max
	}
	return i.Min + share*(i.Max-i.Min)
}

func TestFiniteOverTheWholeRange(t *testing.T) {
	const steps = 12
	states := 0
	for _, m := range All() {
		for i := 0; i <= steps; i++ {
			for j := 0; j <= steps; j++ {
				for _, salt := range []float64{0, 0.3, 1} {
					s := State{
						Temperature: between(m.Range.Temperature, float64(i)/steps),
						Salinity:    between(m.Range.Salinity, salt),
					}
					s.Pressure = between(m.PressureRange(s), float64(j)/steps)
					p, err := m.At(s)
					if err != nil {
						t.Fatalf("%v", err)
					}
					if broken := checkPromise(m, p); broken != nil {
						t.Fatalf("%s at %+v: %v in %+v", m.Name, s, broken, p)
					}
					states++
				}
			}
		}
	}
	if want := len(wantedNames) * (steps + 1) * (steps + 1) * 3; states != want {
		t.Errorf("ran %d states, want %d", states, want)
	}
}

// A step over each edge of the range is refused, and the error names the input
// and the edge.
func TestRefusedOverEachEdge(t *testing.T) {
	checks := 0
	for _, m := range All() {
		for _, e := range edges(m) {
			_, err := m.At(e.state)
			var refused *RangeError
			if !errors.As(err, &refused) {
				t.Errorf("%s: %+v is not refused", m.Name, e.state)
				continue
			}
			if refused.Input != e.input || refused.Fluid != m.Name || refused.Reason == "" {
				t.Errorf("%s: refused for %+v, want %s", m.Name, refused, e.input)
			}
			if refused.Value >= refused.Min && refused.Value <= refused.Max {
				t.Errorf("%s: %v says that the value is inside", m.Name, refused)
			}
			for _, part := range []string{m.Name, string(e.input), refused.Reason} {
				if !strings.Contains(refused.Error(), part) {
					t.Errorf("%q does not say %q", refused.Error(), part)
				}
			}
			checks++
		}
	}
	if want := len(wantedNames) * 9; checks != want {
		t.Errorf("ran %d checks, want %d", checks, want)
	}
}

type edge struct {
	input Input
	state State
}

func edges(m *Model) []edge {
	d := m.Default
	with := func(in Input, value float64) edge {
		s := d
		switch in {
		case Temperature:
			s.Temperature = value
		case Pressure:
			s.Pressure = value
		case Salinity:
			s.Salinity = value
		}
		return edge{in, s}
	}
	p := m.PressureRange(d)
	return []edge{
		with(Temperature, math.Nextafter(m.Range.Temperature.Min, 0)),
		with(Temperature, math.Nextafter(m.Range.Temperature.Max, math.Inf(1))),
		with(Temperature, math.NaN()),
		with(Pressure, math.Nextafter(p.Min, 0)),
		with(Pressure, math.Nextafter(p.Max, math.Inf(1))),
		with(Pressure, math.Inf(1)),
		with(Salinity, math.Nextafter(m.Range.Salinity.Min, -1)),
		with(Salinity, math.Nextafter(m.Range.Salinity.Max, 100)),
		with(Salinity, math.NaN()),
	}
}

// Any state whatever is either answered as promised or refused; nothing
// panics.
func TestAnyStateIsAnsweredOrRefused(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		m := rapid.SampledFrom(All()).Draw(t, "model")
		s := State{
			Temperature: rapid.OneOf(rapid.Float64Range(100, 1600), rapid.Float64()).Draw(t, "temperature"),
			Pressure:    rapid.OneOf(rapid.Float64Range(0, 2e8), rapid.Float64()).Draw(t, "pressure"),
			Salinity:    rapid.OneOf(rapid.Just(0.0), rapid.Float64Range(0, 45), rapid.Float64()).Draw(t, "salinity"),
		}
		p, err := m.At(s)
		if err != nil {
			var refused *RangeError
			if !errors.As(err, &refused) {
				t.Fatalf("%v is no RangeError", err)
			}
			return
		}
		if broken := checkPromise(m, p); broken != nil {
			t.Fatalf("%s at %+v: %v in %+v", m.Name, s, broken, p)
		}
	})
}

// The bulk modulus is the isentropic one, and a model that says it does not
// use an input gives the same for every value of it.
func TestUseOfInputsIsAsStated(t *testing.T) {
	for _, m := range All() {
		base, err := m.At(m.Default)
		if err != nil {
			t.Fatal(err)
		}
		if want := base.Density * base.SoundSpeed * base.SoundSpeed; base.BulkModulus != want {
			t.Errorf("%s: bulk modulus %g, want %g", m.Name, base.BulkModulus, want)
		}
		moved := m.Default
		moved.Temperature = between(m.Range.Temperature, 0.2)
		checkUse(t, m, base, moved, "temperature", m.UsesTemperature)
		moved = m.Default
		moved.Pressure = between(m.PressureRange(moved), 0.53)
		checkUse(t, m, base, moved, "pressure", m.UsesPressure)
		moved = m.Default
		moved.Salinity = between(m.Range.Salinity, 0.1)
		checkUse(t, m, base, moved, "salinity", m.UsesSalinity)
	}
}

func checkUse(t *testing.T, m *Model, base Properties, moved State, input string, uses bool) {
	t.Helper()
	p, err := m.At(moved)
	if err != nil {
		t.Errorf("%v", err)
		return
	}
	if (p.Density != base.Density) != uses {
		t.Errorf("%s: use of %s is stated as %v, density %g and %g", m.Name, input, uses, base.Density, p.Density)
	}
}

func TestPhaseNames(t *testing.T) {
	for phase, want := range map[Phase]string{Unknown: "unknown", Liquid: "liquid", Gas: "gas", 7: "unknown"} {
		if got := phase.String(); got != want {
			t.Errorf("phase %d is %q, want %q", phase, got, want)
		}
	}
}

// A list that a caller changes is the caller's own.
func TestListsAreCopies(t *testing.T) {
	All()[0] = nil
	Names()[0] = ""
	if Find("water") != water || All()[0] != water || Names()[0] != "water" {
		t.Error("a caller can change the catalogue")
	}
}
