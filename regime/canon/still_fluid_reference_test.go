package canon

import (
	"encoding/csv"
	"math"
	"os"
	"strconv"
	"strings"
	"testing"
)

// stillFluidRow is one row of a table "function,arguments,values".
type stillFluidRow struct {
	name       string
	args, want []float64
}

func stillFluidTable(t *testing.T, path string) []stillFluidRow {
	t.Helper()
	f, err := os.Open(path)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	records, err := csv.NewReader(f).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	rows := make([]stillFluidRow, 0, len(records)-1)
	for _, rec := range records[1:] {
		rows = append(rows, stillFluidRow{rec[0], stillFluidNumbers(t, rec[1]), stillFluidNumbers(t, rec[2])})
	}
	return rows
}

func stillFluidNumbers(t *testing.T, s string) []float64 {
	t.Helper()
	var out []float64
	for field := range strings.SplitSeq(s, ";") {
		v, err := strconv.ParseFloat(field, 64)
		if err != nil {
			t.Fatal(err)
		}
		out = append(out, v)
	}
	return out
}

// stillFluidError is |got − want| over |want|, absolute where want is 0.
func stillFluidError(got, want float64) float64 {
	if want == 0 {
		return math.Abs(got)
	}
	return math.Abs(got-want) / math.Abs(want)
}

// The values of the table were computed apart from this package from the defining
// formulas, with 30 to 90 decimal digits of working precision: the shell by the quotient of cross
// products with nothing rearranged, the film by the series over the other index,
// the images by their recurrence. Each part must be right by itself.
func TestStillFluidAgainstHighPrecision(t *testing.T) {
	const tolerance = 1e-9
	rows := stillFluidTable(t, "testdata/still_fluid_reference.csv")
	count, values := map[string]int{}, map[string]int{}
	worst := map[string]float64{}
	for _, row := range rows {
		entry := Find(row.name)
		if entry == nil {
			t.Fatalf("no entry %s", row.name)
		}
		got, err := entry.Evaluate(row.args)
		if err != nil {
			t.Errorf("%s%v: %v", row.name, row.args, err)
			continue
		}
		if len(got) < len(row.want) {
			t.Errorf("%s%v returns %d values, want %d", row.name, row.args, len(got), len(row.want))
			continue
		}
		for i := range row.want {
			e := stillFluidError(got[i], row.want[i])
			worst[row.name] = math.Max(worst[row.name], e)
			if e > tolerance {
				t.Errorf("%s%v[%d] = %.15g, want %.15g, off by %.1e", row.name, row.args, i, got[i], row.want[i], e)
			}
		}
		count[row.name]++
		values[row.name] += len(row.want)
	}
	for name, n := range values {
		tally(t, name, referenceTable, n)
	}
	for name, n := range count {
		t.Logf("%s: %d rows, worst %.1e", name, n, worst[name])
	}
	if len(rows) != 369 {
		t.Errorf("ran %d rows, want 369", len(rows))
	}
}
