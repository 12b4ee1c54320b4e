package main

import (
	"fmt"
	"slices"
	"strings"
	"testing"

	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/whatif"
)

func pile(t *testing.T) *regime.Answer {
	t.Helper()
	c, bad, err := input.Decode([]byte(pileJSON), kind.Schema())
	if err != nil || len(bad) > 0 {
		t.Fatal(bad, err)
	}
	a, bad := regime.Classify(c)
	if len(bad) > 0 {
		t.Fatal(bad)
	}
	return a
}

// Every expectation that is taken from the answer itself is met, and its
// negation is not.
func TestCheckAgreesWithTheAnswer(t *testing.T) {
	a := pile(t)
	path := file(t, "pile.yaml", pileYAML)
	met := []string{"class=" + a.Recommendation.Class.ID}
	var unmet []string
	for _, x := range ladder.AxisList {
		met = append(met, "axis."+x.ID+"="+*x.Of(&a.Recommendation.Axes))
		unmet = append(unmet, "axis."+x.ID+"!="+*x.Of(&a.Recommendation.Axes))
	}
	for i, e := range assumption.Catalogue {
		f := &a.Findings[i]
		met = append(met, e.ID+"="+f.Verdict.String())
		unmet = append(unmet, e.ID+"!="+f.Verdict.String())
		if u, ok := f.Utilisation(); ok {
			met = append(met, fmt.Sprintf("%s.utilisation=%v", e.ID, u), fmt.Sprintf("%s.margin=%v", e.ID, finding.Margin(u)), fmt.Sprintf("%s.estimate<=%v", e.ID, f.Main().Estimate),
				fmt.Sprintf("%s.limit=%v", e.ID, f.Main().Limit), fmt.Sprintf("%s.factor>=1", e.ID))
			unmet = append(unmet, fmt.Sprintf("%s.utilisation!=%v", e.ID, u), e.ID+".utilisation=null")
		} else {
			met = append(met, e.ID+".utilisation=null")
			unmet = append(unmet, e.ID+".utilisation>0", e.ID+".estimate!=null")
		}
	}
	known := 0
	for id := range group.Count {
		name := group.Of(id).ID
		if !a.Groups.Has(id) {
			met = append(met, name+"=null")
			unmet = append(unmet, name+"<1e300", name+"!=null")
			continue
		}
		x := a.Groups.Get(id)
		met = append(met, fmt.Sprintf("%s=%v", name, x), fmt.Sprintf("%s >= %v", name, x), fmt.Sprintf("%s<=%v", name, x), name+"!=null")
		unmet = append(unmet, fmt.Sprintf("%s!=%v", name, x), fmt.Sprintf("%s<%v", name, x), fmt.Sprintf("%s>%v", name, x))
		known++
	}
	if known < 5 {
		t.Errorf("the case has %d groups", known)
	}
	compareAll(t, path, met, "ok   ", statusMet)
	compareAll(t, path, unmet, "FAIL ", statusUnmet)
}

func compareAll(t *testing.T, path string, expectations []string, begin string, want int) {
	t.Helper()
	args := []string{"check", path}
	for _, e := range expectations {
		args = append(args, "--expect", e)
	}
	got := regimed("", args...)
	printed := strings.Split(strings.TrimSuffix(got.out, "\n"), "\n")
	if got.status != want || len(printed) != len(expectations)+1 {
		t.Fatalf("status %d, %d lines for %d expectations\n%s", got.status, len(printed), len(expectations), got.errOut)
	}
	for i, e := range expectations {
		if !strings.HasPrefix(printed[i], begin+path+"  "+e) {
			t.Errorf("%s: got %q", e, printed[i])
		}
	}
	if last := printed[len(printed)-1]; !strings.HasPrefix(last, fmt.Sprintf("%d expectations of 1 file: ", len(expectations))) {
		t.Errorf("summary %q", last)
	}
}

func TestCheckPrints(t *testing.T) {
	class := pile(t).Recommendation.Class.ID
	other := "two-way-implicit"
	plain := file(t, "pile.yaml", pileYAML)
	situation := file(t, "situation.json", `{"title": "A pile", "source": "invented", "expect": ["class=`+other+`|`+class+`", "class=`+other+`"], "case": `+pileJSON+`}`)
	bad := file(t, "bad.yaml", "structure: {kind: cylinder, diameter: 1 kg}\n")
	badOwn := file(t, "own.yaml", "case:\n"+indent(pileYAML)+"expect:\n - class=added-mas\n - renolds>1\n - class\n")
	rows := []struct {
		name        string
		args        []string
		status      int
		out, errOut string
	}{
		{"met", []string{plain, "--expect", "class=" + class}, 0,
			"ok   " + plain + "  class=" + class + "\n1 expectation of 1 file: 1 met, 0 not met\n", ""},
		{"not met", []string{plain, "-e", "class=" + other}, 1,
			"FAIL " + plain + "  class=" + other + "  got " + class + "\n1 expectation of 1 file: 0 met, 1 not met\n", ""},
		{"own ones", []string{situation}, 1,
			"ok   " + situation + "  class=" + other + "|" + class + "\nFAIL " + situation + "  class=" + other + "  got " + class + "\n2 expectations of 1 file: 1 met, 1 not met\n", ""},
		{"two files", []string{plain, situation, "-e", "class!=" + other}, 1,
			"ok   " + plain + "  class!=" + other + "\nok   " + situation + "  class!=" + other + "\nok   " + situation + "  class=" + other + "|" + class +
				"\nFAIL " + situation + "  class=" + other + "  got " + class + "\n4 expectations of 2 files: 3 met, 1 not met\nfiles by kind: cylinder 2\nexpectations by question: class 4\n", ""},
		{"quiet", []string{"--quiet", situation}, 1,
			"FAIL " + situation + "  class=" + other + "  got " + class + "\n", ""},
		{"quiet and met", []string{"-q", plain, "-e", "class=" + class}, 0, "", ""},
		{"nothing expected", []string{plain}, 2,
			"0 expectations of 1 file: 0 met, 0 not met; 1 file refused\n", plain + ": Nothing is expected of it: give --expect, or expectations beside the case.\n"},
		{"a bad file among good ones", []string{bad, plain, "-e", "class=" + class}, 2,
			"ok   " + plain + "  class=" + class + "\n1 expectation of 2 files: 1 met, 0 not met; 1 file refused\nfiles by kind: cylinder 1\nexpectations by question: class 1\n", bad + ":1: /structure/diameter: wrong-dimension: "},
		{"own ones that are wrong", []string{badOwn}, 2,
			"0 expectations of 1 file: 0 met, 0 not met; 1 file refused\n", badOwn + ":15: /expect/0: expectation: "},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", append([]string{"check"}, row.args...)...)
		if got.status != row.status || got.out != row.out || !strings.HasPrefix(got.errOut, row.errOut) || (row.errOut == "") != (got.errOut == "") {
			t.Errorf("%s: status %d\n%s%s\nwant status %d\n%s%s", row.name, got.status, got.out, got.errOut, row.status, row.out, row.errOut)
		}
		ran++
	}
	if ran != 9 {
		t.Errorf("ran %d rows", ran)
	}
	if got := regimed("", "check", badOwn); strings.Count(got.errOut, "\n") != 3 {
		t.Errorf("want all three expectations refused, got\n%s", got.errOut)
	}
}

func TestExpectationsThatAreRefused(t *testing.T) {
	rows := []struct{ text, says string }{
		{"", "is no expectation"},
		{"class", "is no expectation"},
		{"=added-mass", "is no expectation"},
		{"class=", "is no expectation"},
		{"class=added-mas", "Did you mean added-mass?"},
		{"class=added-mass|nonsense", `no such value "nonsense"`},
		{"class~added-mass", "a name takes = or !="},
		{"class=added-mass|", `no such value ""`},
		{"clas=added-mass", "Did you mean class?"},
		{"axis.couplings=one-way", "Did you mean axis.coupling?"},
		{"axis.coupling=two-way", "it is one of none, one-way"},
		{"one-way=vald", "Did you mean valid?"},
		{"oneway=valid", "Did you mean one-way?"},
		{"one-way.utilization<1", "Did you mean one-way.utilisation?"},
		{"one-way.utilisation<much", `"much" is no number`},
		{"reynold>1", "Did you mean reynolds?"},
		{"reynolds>1e999", "is no number"},
		{"reynolds=NaN", "is no number"},
		{"reynolds<null", "null takes = or !="},
		{"mach~0", "2 % of 0"},
		{"reynolds=1|2", "is no number"},
	}
	ran := 0
	for _, row := range rows {
		_, err := parseExpectation(row.text)
		if err == nil || !strings.Contains(err.Error(), row.says) {
			t.Errorf("%q: got %v, want %q in it", row.text, err, row.says)
		}
		ran++
	}
	if ran != 21 {
		t.Errorf("ran %d rows", ran)
	}
	got := regimed("", "check", "never-read.yaml", "-e", "class=added-mas", "-e", "renolds>1")
	if got.status != statusRefuse || got.out != "" || !strings.Contains(got.errOut, "added-mass") || !strings.Contains(got.errOut, "reynolds") {
		t.Errorf("got %+v", got)
	}
}

// Probabilities can be expected of an uncertain case; a certain one has none.
func TestCheckProbabilities(t *testing.T) {
	certain := file(t, "pile.yaml", pileYAML)
	unsure := file(t, "unsure.yaml", strings.Replace(pileYAML, "frequency_dry: 2 Hz", "frequency_dry: 2 Hz +- 20 %", 1))
	rows := []struct {
		file, expect string
		status       int
		out          string
	}{
		{unsure, "probability.added-mass>0.9", statusMet, "ok "},
		{unsure, "probability.dry-structure=0", statusMet, "ok "},
		{unsure, "probability.added-mass<0.5", statusUnmet, "FAIL "},
		{certain, "probability.added-mass>0.9", statusUnmet, "FAIL "},
		{certain, "probability.added-mass=null", statusMet, "ok "},
		{unsure, "probability.added-mas>0.9", statusRefuse, ""},
	}
	for _, row := range rows {
		got := regimed("", "check", row.file, "-e", row.expect)
		if got.status != row.status || !strings.HasPrefix(got.out, row.out) {
			t.Errorf("%s: %+v", row.expect, got)
		}
	}
	if len(rows) != 6 {
		t.Errorf("%d rows", len(rows))
	}
}

// A subject must mean one thing only.
func TestSubjectsAreUnique(t *testing.T) {
	all := whatif.ColumnNames()
	slices.Sort(all)
	if n := len(slices.Compact(slices.Clone(all))); n != len(all) || n < 100 {
		t.Errorf("%d subjects, %d different ones", len(all), n)
	}
	for _, s := range all {
		if c, err := whatif.FindColumn(s); err != nil || (c.Text == nil) == (c.Number == nil) {
			t.Errorf("%s is listed and not known", s)
		}
	}
}

func TestCompare(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64Range(-1e9, 1e9).Draw(t, "x")
		y := rapid.Float64Range(-1e9, 1e9).Draw(t, "y")
		is := func(op string) bool { return compare(x, op, y) }
		if is("<") == is(">=") || is(">") == is("<=") || is("=") == is("!=") || is("=") && !is("~") {
			t.Fatalf("%v and %v", x, y)
		}
	})
	rows := []struct {
		x    float64
		op   string
		y    float64
		want bool
	}{
		{1.0199, "~", 1, true}, {1.0201, "~", 1, false}, {-0.981, "~", -1, true}, {0.1 + 0.2, "=", 0.3, true},
		{0.30001, "=", 0.3, false}, {0, "=", 0, true}, {1e-300, "=", 0, false}, {2, "<", 2, false}, {2, "<=", 2, true},
	}
	ran := 0
	for _, row := range rows {
		if got := compare(row.x, row.op, row.y); got != row.want {
			t.Errorf("%v %s %v: %v", row.x, row.op, row.y, got)
		}
		ran++
	}
	if ran != 9 {
		t.Errorf("ran %d rows", ran)
	}
}
