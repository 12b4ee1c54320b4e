package solid

import (
	"encoding/csv"
	"math"
	"os"
	"regexp"
	"slices"
	"strconv"
	"testing"

	"regimed/regime/cite"
)

var wantedNames = []string{
	"steel", "stainless-steel", "aluminium", "titanium", "copper", "brass", "concrete", "glass", "grp", "cfrp",
	"pvc", "hdpe", "ptfe", "rubber", "silicone", "pet-film", "paper-cone", "silicon", "silicon-nitride",
	"arterial-wall", "wood", "ice", "pzt", "pvdf",
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
		if m.Title == "" || m.Note == "" || !m.Typical || len(m.Sources) == 0 {
			t.Errorf("%s lacks title, note, the mark of typical values or a source", m.Name)
		}
		for _, s := range m.Sources {
			if s == nil || cite.ByID(s.ID) != s {
				t.Errorf("%s has a source outside the bibliography", m.Name)
			}
		}
	}
	if Find("no such material") != nil {
		t.Error("found a material that is not there")
	}
	All()[0] = nil
	if All()[0] == nil {
		t.Error("a caller can change the catalogue")
	}
}

// An isotropic elastic solid is stable for E > 0 and −1 < ν < 1/2; the waves
// of all solids in use are within 10 to 20 000 m/s, and none of them is
// linear beyond a quarter.
func TestValuesArePhysical(t *testing.T) {
	for _, m := range All() {
		if !(m.Density > 10 && m.Density < 23000) {
			t.Errorf("%s: density %g kg/m³", m.Name, m.Density)
		}
		if !(m.Young > 1e3 && m.Young < 1.2e12) {
			t.Errorf("%s: modulus %g Pa", m.Name, m.Young)
		}
		if !(m.Poisson > 0 && m.Poisson < 0.5) {
			t.Errorf("%s: Poisson's ratio %g", m.Name, m.Poisson)
		}
		if !(m.BarSpeed() > 10 && m.BarSpeed() < 20000) {
			t.Errorf("%s: bar speed %g m/s", m.Name, m.BarSpeed())
		}
		if !math.IsNaN(m.LinearStrain) && !(m.LinearStrain > 0 && m.LinearStrain < 0.25) {
			t.Errorf("%s: linear strain %g", m.Name, m.LinearStrain)
		}
	}
}

// Every material lies within the range that a work gives for its kind,
// written down from memory.
func TestValuesLieWithinPublishedRanges(t *testing.T) {
	file, err := os.Open("testdata/outside.csv")
	if err != nil {
		t.Fatal(err)
	}
	defer file.Close()
	rows, err := csv.NewReader(file).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	seen := map[string]bool{}
	for _, r := range rows[1:] {
		m := Find(r[0])
		if m == nil || cite.ByID(r[7]) == nil {
			t.Errorf("no material %q or no source %q", r[0], r[7])
			continue
		}
		for i, v := range []float64{m.Density, m.Young, m.Poisson} {
			low, high := number(t, r[1+2*i]), number(t, r[2+2*i])
			if !(v >= low && v <= high) {
				t.Errorf("%s: %s is %g, %s has %g to %g", m.Name, []string{"density", "modulus", "Poisson's ratio"}[i], v, cite.ByID(r[7]).Short, low, high)
			}
		}
		seen[m.Name] = true
	}
	for _, name := range Names() {
		if !seen[name] {
			t.Errorf("%s has no known answer", name)
		}
	}
	if len(rows)-1 != 24 {
		t.Errorf("ran %d rows, want 24", len(rows)-1)
	}
}

func number(t *testing.T, text string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(text, 64)
	if err != nil {
		t.Fatal(err)
	}
	return x
}

// Bar speeds in m/s from memory of Kinsler et al., appendix A10, and for ice
// and silicon of common tables: an independent look at √(E/ρ).
func TestBarSpeedAgainstTables(t *testing.T) {
	rows := []struct {
		name string
		c    float64
	}{
		{"steel", 5050}, {"aluminium", 5150}, {"copper", 3700}, {"brass", 3500}, {"titanium", 5000},
		{"glass", 5200}, {"concrete", 3400}, {"ice", 3200}, {"silicon", 8300},
	}
	for _, r := range rows {
		if got := Find(r.name).BarSpeed(); math.Abs(got-r.c) > 0.05*r.c {
			t.Errorf("%s: bar speed %.4g m/s, %s has %g", r.name, got, cite.KinslerAcoustics.Short, r.c)
		}
	}
	if len(rows) != 9 {
		t.Errorf("ran %d rows, want 9", len(rows))
	}
}
