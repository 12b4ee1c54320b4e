package main

import (
	"math"
	"net/http"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"

	"regimed/api"
	"regimed/regime/canon"
)

func TestCanonValues(t *testing.T) {
	rows := []struct {
		args   []string
		values []float64
	}{
		{[]string{"OscillatingCylinder", "36"}, []float64{1.4727210417, 0.525368658054}},
		{[]string{"oscillatingcylinder", "3.6e1"}, []float64{1.4727210417, 0.525368658054}},
		{[]string{"ConveyingPipe", "0.2"}, []float64{5.59140437783, 13.7146998005}},
		{[]string{"ConveyingPipe", "--support", "cantilever", "--beta", "0.2"}, []float64{5.59140437783, 13.7146998005}},
		{[]string{"ConveyingPipe", "--support=cantilever", "0.2"}, []float64{5.59140437783, 13.7146998005}},
		{[]string{"ConveyingPipe", "0.2", "10"}, []float64{6.33979801811}},
		{[]string{"ConveyingPipe", "0.2", "0", "0", "pinned-pinned"}, []float64{math.Pi, 0}},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", append([]string{"canon"}, row.args...)...)
		var r api.CanonResult
		if err := json.Unmarshal([]byte(withoutArguments(got.out)), &r); got.status != statusMet || err != nil {
			t.Errorf("%v: status %d, %v: %s%s", row.args, got.status, err, got.out, got.errOut)
			continue
		}
		for i, want := range row.values {
			if x := *r.Values[i].Value; math.Abs(x-want) > 1e-8*math.Max(1, math.Abs(want)) {
				t.Errorf("%v: %s is %.12g, want %.12g", row.args, r.Values[i].ID, x, want)
			}
		}
		ran++
	}
	if ran != 7 {
		t.Errorf("ran %d rows", ran)
	}
}

// withoutArguments cuts the arguments out, which have no type to decode into.
func withoutArguments(line string) string {
	before, rest, _ := strings.Cut(line, `"arguments":{`)
	_, after, _ := strings.Cut(rest, `},`)
	return before + after
}

// A negative number is an argument, not a flag.
func TestCanonTakesNegativeNumbers(t *testing.T) {
	named := regimed("", "canon", "ConveyingPipe", "--gamma", "-5", "--beta", "0.2")
	plain := regimed("", "canon", "ConveyingPipe", "0.2", "-5")
	after := regimed("", "canon", "ConveyingPipe", "--", "0.2", "-5")
	if plain.status != statusMet || plain != named || plain != after {
		t.Errorf("got %+v, %+v, %+v", plain, named, after)
	}
	if !strings.HasPrefix(plain.out, `{"name":"ConveyingPipe","arguments":{"beta":0.2,"gamma":-5,"alpha":0,"support":"cantilever"},"values":[{"id":`) || !strings.HasSuffix(plain.out, "}]}\n") {
		t.Errorf("got %s", plain.out)
	}
}

func TestCanonIsWhatTheServiceAnswers(t *testing.T) {
	rows := []struct{ path, args string }{
		{"OscillatingCylinder?R=36", "OscillatingCylinder 36"},
		{"ConveyingPipe?beta=0.2&gamma=-5", "ConveyingPipe 0.2 -5"},
		{"WakeLockIn?am=1", "WakeLockIn 1"}, // the upper edge is unbounded
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", append([]string{"canon"}, strings.Fields(row.args)...)...)
		if want := served(t, http.MethodGet, "/v1/canon/"+row.path, ""); got.out != want {
			t.Errorf("%s: got %s%s, want %s", row.args, got.out, got.errOut, want)
		}
		ran++
	}
	if ran != 3 {
		t.Errorf("ran %d rows", ran)
	}
}

func TestCanonRefuses(t *testing.T) {
	rows := []struct{ args, says string }{
		{"OscillatingCylinder", "argument"},
		{"OscillatingCylinder 36 37", "one argument too many"},
		{"OscillatingCylinder thirty", `not "thirty"`},
		{"OscillatingCylinder NaN", `not "NaN"`},
		{"OscillatingCylinder -1", "outside"},
		{"ConveyingPipe --length 3", `has no argument "length"`},
		{"ConveyingPipe --beta", "needs a value"},
		{"ConveyingPipe --beta 0.2 --beta 0.3", "given twice"},
		{"ConveyingPipe 0.2 --support glued", "one of cantilever"},
		{"ConveyingPipe 0.2 -60", "own weight"},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", append([]string{"canon"}, strings.Fields(row.args)...)...)
		if got.status != statusRefuse || got.out != "" || !strings.Contains(got.errOut, row.says) {
			t.Errorf("%s: %+v, want %q in it", row.args, got, row.says)
		}
		ran++
	}
	if ran != 10 {
		t.Errorf("ran %d rows", ran)
	}
}

// Every entry describes itself, with its arguments and results.
func TestCanonDescribes(t *testing.T) {
	ran := 0
	for _, e := range canon.All() {
		got := regimed("", "canon", e.Name, "--help")
		for _, want := range []string{e.Problem, e.Equation, "Relative accuracy", e.Outputs[0].ID, e.Sources[0].Full, e.Args[0].Doc} {
			if got.status != statusMet || !strings.Contains(got.out, want) {
				t.Errorf("%s: %q is not in\n%s%s", e.Name, want, got.out, got.errOut)
			}
		}
		ran++
	}
	if ran < 10 {
		t.Errorf("described %d entries", ran)
	}
}

func TestBounds(t *testing.T) {
	rows := []struct {
		least, most float64
		want        string
	}{
		{0, 1, "0 to 1"}, {0, math.Inf(1), "from 0 on"}, {-math.MaxFloat64, 2, "up to 2"}, {math.Inf(-1), math.MaxFloat64, "any number"},
	}
	ran := 0
	for _, row := range rows {
		if got := bounds(row.least, row.most); got != row.want {
			t.Errorf("%g to %g: got %q, want %q", row.least, row.most, got, row.want)
		}
		ran++
	}
	if ran != 4 {
		t.Errorf("ran %d rows", ran)
	}
}
