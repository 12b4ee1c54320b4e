package canon

import (
	"slices"
	"strings"
	"testing"
)

// checkCall says how a row of the check table calls an entry: arguments to put
// before and after those of the row, and the outputs that the row gives, by name;
// without names the row gives the first ones.
type checkCall struct {
	entry         string
	before, after []float64
	outputs       []string
}

// checkCalls holds the rows whose name is not that of an entry.
func checkCalls(t *testing.T) map[string]checkCall {
	cantilever := slices.Index(pipeSupportNames(), "cantilever")
	if cantilever < 0 {
		t.Fatal("no cantilever among the supports of ConveyingPipe")
	}
	return map[string]checkCall{
		"ConveyingPipe.cantilever":              {entry: "ConveyingPipe", after: []float64{float64(cantilever)}},
		"RectangularTank.massFraction":          {entry: "RectangularTank", before: []float64{1}, outputs: []string{"mass_fraction"}},
		"UprightTank.massFraction":              {entry: "UprightTank", before: []float64{1}, outputs: []string{"mass_fraction"}},
		"WaveSpeed.c1=1":                        {entry: "WaveSpeed", after: []float64{1}},
		"SectionFlutter(mu,a,x_alpha,r2,wh/wa)": {entry: "SectionFlutter", outputs: []string{"speed", "frequency", "k"}},
	}
}

// The table was computed apart from this package, to 30 digits, and is given to
// twelve. Every row of it must have been evaluated through the entries.
func TestCanonCheckValues(t *testing.T) {
	const tolerance = 1e-6
	calls := checkCalls(t)
	rows := stillFluidTable(t, "testdata/canon.csv")
	evaluated := 0
	values := map[string]int{}
	for _, row := range rows {
		call, renamed := calls[row.name]
		if !renamed {
			call.entry = row.name
		}
		entry := Find(call.entry)
		if entry == nil {
			t.Errorf("no entry for %s", row.name)
			continue
		}
		got, err := entry.Evaluate(slices.Concat(call.before, row.args, call.after))
		if err != nil {
			t.Errorf("%s%v: %v", row.name, row.args, err)
			continue
		}
		got = selectOutputs(entry, got, call.outputs)
		if len(got) < len(row.want) {
			t.Errorf("%s%v returns %d values, want %d", row.name, row.args, len(got), len(row.want))
			continue
		}
		for i, want := range row.want {
			if e := stillFluidError(got[i], want); !(e <= tolerance) {
				t.Errorf("%s%v[%d] = %.12g, want %.12g, off by %.1e", row.name, row.args, i, got[i], want, e)
			}
		}
		evaluated++
		values[entry.Name] += len(row.want)
		if entry.Name == "RectangularTank" || entry.Name == "UprightTank" {
			values["SloshingMassFraction"]++
			tank := slices.Index(tankNames, map[string]string{"RectangularTank": "rectangular", "UprightTank": "upright-circular"}[entry.Name])
			same, err := sloshingMassFractionEntry.Evaluate([]float64{float64(tank), row.args[0]})
			if err != nil || same[0] != got[0] {
				t.Errorf("SloshingMassFraction%v: %v, %v, want %g", row.args, same, err, got[0])
			}
		}
	}
	for name, n := range values {
		tally(t, name, checkTable, n)
	}
	if evaluated != len(rows) || len(rows) != 141 {
		t.Errorf("evaluated %d of %d rows, want all 141", evaluated, len(rows))
	}
}

// selectOutputs returns the outputs with the given names, all without names.
func selectOutputs(e *Entry, values []float64, ids []string) []float64 {
	if len(ids) == 0 {
		return values
	}
	var out []float64
	for _, id := range ids {
		i := slices.IndexFunc(e.Outputs, func(o Output) bool { return o.ID == id })
		if i >= 0 {
			out = append(out, values[i])
		}
	}
	return out
}

func TestCanonEntriesAreNamedOnce(t *testing.T) {
	seen := map[string]bool{}
	for _, e := range All() {
		key := strings.ToLower(e.Name)
		if seen[key] {
			t.Errorf("%s is listed twice", e.Name)
		}
		seen[key] = true
		if Find(strings.ToUpper(e.Name)) != e {
			t.Errorf("%s is not found by its name in capitals", e.Name)
		}
		ids := map[string]bool{}
		for _, o := range e.Outputs {
			if o.ID == "" || ids[o.ID] {
				t.Errorf("%s: output %q is empty or twice", e.Name, o.ID)
			}
			ids[o.ID] = true
		}
		for _, s := range e.Sources {
			if s == nil {
				t.Errorf("%s has a source that is nil", e.Name)
			}
		}
	}
	if len(seen) < 40 {
		t.Errorf("ran %d entries, want at least 40", len(seen))
	}
}
