package whatif

import (
	"context"
	"fmt"
	"slices"
	"strings"
	"testing"

	"regimed/regime"
	"regimed/regime/kind"
)

func TestClassifyCarriesTheSpread(t *testing.T) {
	certain := uncertainCase(t, fmt.Sprintf(pile, "0.01", "1.4 m/s"))
	a, bad, err := Classify(context.Background(), certain, Options{})
	if err != nil || len(bad) > 0 || a.Spread != nil {
		t.Fatalf("%v %v %v", a.Spread, bad, err)
	}
	c := uncertainCase(t, fmt.Sprintf(pile, "0.01", "1.4 m/s +- 20 %"))
	b, bad, err := Classify(context.Background(), c, Options{Samples: 128})
	if err != nil || len(bad) > 0 || b.Spread == nil || b.Spread.Samples != 128 {
		t.Fatalf("%+v %v %v", b.Spread, bad, err)
	}
	if a.Recommendation.Class != b.Recommendation.Class || a.Groups.Get(0) != b.Groups.Get(0) {
		t.Error("the answer is not that at the middle")
	}
	isUncertain := func(w kind.Warning) bool { return w.Code == kind.UncertainCode }
	if slices.ContainsFunc(b.Warnings, isUncertain) {
		t.Errorf("%+v", b.Warnings)
	}
	plain, _ := regime.Classify(c)
	if i := slices.IndexFunc(plain.Warnings, isUncertain); i < 0 || plain.Warnings[i].Pointer != "/flow/speed" || !strings.Contains(plain.Warnings[i].Sentence, "middle, 1.40 m/s") {
		t.Errorf("an answer without spread does not say where its inputs are taken: %+v", plain.Warnings)
	}
}

// What is wrong with a case comes back as from the classification itself.
func TestClassifyRefusesWhatCannotBe(t *testing.T) {
	c := uncertainCase(t, `{"structure": {"kind": "cylinder", "diameter": "0.3 m"}, "fluid": {"name": "water", "temperature": "300 degC +- 5 K"}}`)
	_, want := regime.Classify(c)
	a, bad, err := Classify(context.Background(), c, Options{})
	if a != nil || err != nil || len(bad) == 0 || len(bad) != len(want) || bad[0].Pointer != want[0].Pointer {
		t.Errorf("%v %+v %v", a, bad, err)
	}
}

// The columns of probabilities are read from the spread.
func TestProbabilityColumns(t *testing.T) {
	c := uncertainCase(t, fmt.Sprintf(pile, "0.01", "1.4 m/s +- 20 %"))
	a, _, err := Classify(context.Background(), c, Options{})
	if err != nil {
		t.Fatal(err)
	}
	sum, rows := 0.0, 0
	for _, name := range ColumnNames() {
		if !strings.HasPrefix(name, "probability.") {
			continue
		}
		column, err := FindColumn(name)
		if err != nil || !column.NeedsSpread() || column.Unit(a) != "1" {
			t.Fatalf("%s: %v %+v", name, err, column)
		}
		p, why := column.Number(a)
		if !(p >= 0) || why != "" {
			t.Errorf("%s: %v %s", name, p, why)
		}
		sum += p
		rows++
	}
	if rows < 10 || sum < 1-1e-12 || sum > 1+1e-12 {
		t.Errorf("%d classes sum to %v", rows, sum)
	}
	column, err := FindColumn("probability.added-mass")
	if err != nil {
		t.Fatal(err)
	}
	plain, _ := regime.Classify(c)
	if p, why := column.Number(plain); p == p || why == "" {
		t.Errorf("without a spread: %v %q", p, why)
	}
	if _, err := FindColumn("probability.added-mas"); err == nil || !strings.Contains(err.Error(), "probability.added-mass") {
		t.Errorf("%v", err)
	}
}

// Of an assumption that has no such number the names that it has are offered.
func TestNamesNearAColumn(t *testing.T) {
	rows := []struct{ name, near string }{
		{"reynlds", "Did you mean reynolds?"},
		{"still-fluid.verdict", "Did you mean still-fluid or still-fluid.utilisation?"},
		{"nothing.verdict", `"nothing.verdict".`},
	}
	ran := 0
	for _, row := range rows {
		if _, err := FindColumn(row.name); err == nil || !strings.HasSuffix(err.Error(), row.near) {
			t.Errorf("%s: %v", row.name, err)
		}
		ran++
	}
	if ran != 3 {
		t.Errorf("%d rows", ran)
	}
}
