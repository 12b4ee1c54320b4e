package fluid

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"testing"

	"regimed/regime/cite"
)

// outsideRows is how many values testdata/outside.csv holds; a row that is
// lost fails the test.
const outsideRows = 74

// The density of the standard atmosphere at 11 km is quoted as 0.36391 kg/m³;
// the temperature and pressure of that height give 0.363918, so the quoted
// value is cut off, not rounded, and its tolerance is one unit of its last
// digit.

// outside is one published value. All were written down from memory of the
// source, as the sources in package cite say.
type outside struct {
	line             int
	model, property  string
	state            State
	value, tolerance float64
	source           string
}

func readOutside(t *testing.T) []outside {
	t.Helper()
	file, err := os.Open("testdata/outside.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	records, err := csv.NewReader(file).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	number := func(text string) float64 {
		x, err := strconv.ParseFloat(text, 64)
		if err != nil {
			t.Fatal(err)
		}
		return x
	}
	var rows []outside
	for i, r := range records[1:] {
		rows = append(rows, outside{
			line: i + 2, model: r[0], property: r[4], source: r[7],
			state: State{Temperature: number(r[1]), Pressure: number(r[2]), Salinity: number(r[3])},
			value: number(r[5]), tolerance: number(r[6]),
		})
	}
	return rows
}

func property(p Properties, name string) float64 {
	switch name {
	case "density":
		return p.Density
	case "specific_volume":
		return 1 / p.Density
	case "viscosity":
		return p.Viscosity
	case "kinematic_viscosity":
		return p.Viscosity / p.Density
	case "sound_speed":
		return p.SoundSpeed
	case "vapour_pressure":
		return p.VapourPressure
	case "surface_tension":
		return p.SurfaceTension
	case "prandtl":
		return p.Prandtl
	}
	return math.NaN()
}

func TestOutsideValues(t *testing.T) {
	rows := readOutside(t)
	seen := map[string]int{}
	memory := 0
	for _, r := range rows {
		m := Find(r.model)
		if m == nil {
			t.Errorf("line %d: no model %q", r.line, r.model)
			continue
		}
		source := cite.ByID(r.source)
		if source == nil {
			t.Errorf("line %d: no source %q", r.line, r.source)
			continue
		}
		if source.Memory {
			memory++
		}
		p, err := m.At(r.state)
		if err != nil {
			t.Errorf("line %d: %v", r.line, err)
			continue
		}
		got := property(p, r.property)
		if !(math.Abs(got-r.value) <= r.tolerance*r.value) {
			t.Errorf("line %d: %s %s at %+v: got %.10g, want %.10g within %.1e, off by %.2e (%s)",
				r.line, r.model, r.property, r.state, got, r.value, r.tolerance, got/r.value-1, source.Short)
		}
		seen[r.model]++
	}
	for _, name := range Names() {
		if seen[name] == 0 {
			t.Errorf("%s has no known answer", name)
		}
	}
	if len(rows) != outsideRows {
		t.Errorf("ran %d rows, want %d", len(rows), outsideRows)
	}
	t.Logf("%d rows, %d of them from memory of their source", len(rows), memory)
}
