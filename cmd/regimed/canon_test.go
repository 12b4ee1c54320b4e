package main

import (
	"math"
	"net/http"
	"os"
	"path/filepath"
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
		{[]string{"Theodorsen", "0.1"}, []float64{0.831924104965, -0.172302228734}},
		{[]string{"CylinderInShell", "1000", "1.1"}, []float64{12.8384807773, 14.0765516577}},
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
	if ran != 9 {
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
		{"Theodorsen --plot", "needs the name of a file"},
		{"Theodorsen --plot out.pdf", "ends in .svg or .png"},
		{"Theodorsen --plot a.svg --plot=b.svg", "given twice"},
		{"Theodorsen -1 --plot a.svg", "outside"},
		{"Theodorsen --plot no/such/folder/a.svg", "no such file"},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", append([]string{"canon"}, strings.Fields(row.args)...)...)
		if got.status != statusRefuse || got.out != "" || !strings.Contains(got.errOut, row.says) {
			t.Errorf("%s: %+v, want %q in it", row.args, got, row.says)
		}
		ran++
	}
	if ran != 15 {
		t.Errorf("ran %d rows", ran)
	}
}

// A picture is written beside the values, or alone where not all is given; what
// the picture is drawn over need not be.
func TestCanonPlots(t *testing.T) {
	folder := t.TempDir()
	path := func(name string) string { return filepath.Join(folder, name) }
	rows := []struct {
		args         []string
		file, prints string
		holds        string
	}{
		{[]string{"Theodorsen", "--plot", path("a.svg")}, "a.svg", path("a.svg"), "Lift deficiency of a thin aerofoil"},
		{[]string{"Theodorsen", "0.1", "--plot=" + path("b.svg")}, "b.svg", `"value":0.8319241049`, "k = 0.1: F = 0.831924, G = −0.172302"},
		{[]string{"CylinderInShell", "--plot", path("c.svg"), "--q", "1.1"}, "c.svg", path("c.svg"), "CylinderInShell at q = 1.1"},
		{[]string{"ConveyingPipe", "--gamma", "-5", "--plot", path("d.svg")}, "d.svg", path("d.svg"), "ConveyingPipe at γ = −5"},
		{[]string{"StringMode", "--plot", path("e.png")}, "e.png", path("e.png"), "PNG"},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", append([]string{"canon"}, row.args...)...)
		if got.status != statusMet || !strings.Contains(got.out, row.prints) {
			t.Errorf("%v: %+v, want %q", row.args, got, row.prints)
		}
		picture, err := os.ReadFile(path(row.file))
		if err != nil || !strings.Contains(string(picture), row.holds) {
			t.Errorf("%v: %q is not in the picture, %v", row.args, row.holds, err)
		}
		ran++
	}
	if ran != 5 {
		t.Errorf("ran %d rows", ran)
	}
	// A word after a lone -- is no flag.
	got := regimed("", "canon", "Theodorsen", "--", "--plot")
	if got.status != statusRefuse || !strings.Contains(got.errOut, `not "--plot"`) {
		t.Errorf("got %+v", got)
	}
}

// Every entry describes itself, with its arguments and results.
func TestCanonDescribes(t *testing.T) {
	ran := 0
	for _, e := range canon.All() {
		got := regimed("", "canon", e.Name, "--help")
		for _, want := range []string{e.Problem, e.Equation, "Relative accuracy", "Drawn over " + e.Args[e.Sweep()].Name, e.Outputs[0].ID, e.Sources[0].Full, e.Args[0].Doc} {
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
