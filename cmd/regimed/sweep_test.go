package main

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"net/http"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"time"

	"github.com/go-json-experiment/json/jsontext"
	"github.com/parquet-go/parquet-go"
)

// The command writes what the service answers to the same request, whichever
// way it is written.
func TestSweepIsWhatTheServiceAnswers(t *testing.T) {
	request := `{"case": ` + pileJSON + `, "axes": ["motion.amplitude=1..100 mm:5:log", "fluid.name=water,seawater"], "columns": ["class", "keulegan_carpenter"]`
	lines, rows := served(t, http.MethodPost, "/v1/sweeps", request+`}`), served(t, http.MethodPost, "/v1/sweeps", request+`, "format": "csv"}`)
	part := served(t, http.MethodPost, "/v1/sweeps", request+`, "shards": 3, "index": 1}`)
	pile, plan := file(t, "pile.yaml", pileYAML), file(t, "plan.json", request+`, "format": "csv"}`)
	planYAML := file(t, "plan.yaml", "case:\n"+indent(pileYAML)+"axes:\n  - motion.amplitude=1..100 mm:5:log\n  - input: fluid.name\n    values: [water, seawater]\ncolumns: [class, keulegan_carpenter]\nshards: 3\nindex: 1\n")
	flags := []string{"--axis", "motion.amplitude=1..100 mm:5:log", "-a", "fluid.name=water,seawater", "--column", "class", "-c", "keulegan_carpenter"}
	out := filepath.Join(t.TempDir(), "out.csv")
	other := filepath.Join(t.TempDir(), "out.txt")
	tests := []struct {
		stdin string
		args  []string
		file  string
		want  string
	}{
		{"", append([]string{pile}, flags...), "", lines},
		{pileJSON, append([]string{"-"}, flags...), "", lines},
		{"", append([]string{pile, "--format", "csv"}, flags...), "", rows},
		{"", append([]string{pile, "-o", out}, flags...), out, rows},
		{"", append([]string{pile, "-f", "ndjson", "-o", other}, flags...), other, lines},
		{"", append([]string{pile, "--shards", "3", "--index", "1"}, flags...), "", part},
		{"", []string{"--plan", plan}, "", rows},
		{"", []string{"--plan", plan, "--format", "ndjson"}, "", lines},
		{"", []string{"--plan", planYAML}, "", part},
		{"", []string{"--plan", planYAML, "--shards", "1", "--format", "csv"}, "", rows},
		{request + `}`, []string{"--plan", "-"}, "", lines},
	}
	for _, row := range tests {
		got := regimed(row.stdin, append([]string{"sweep"}, row.args...)...)
		text := got.out
		if row.file != "" {
			text = contents(t, row.file)
		}
		if got.status != statusMet || got.errOut != "" || text != row.want {
			t.Errorf("%v: status %d %s\ngot  %.300s\nwant %.300s", row.args, got.status, got.errOut, text, row.want)
		}
	}
	if len(tests) != 11 {
		t.Errorf("%d rows", len(tests))
	}
	if first, _, _ := strings.Cut(lines, "\n"); !jsontext.Value(first).IsValid() {
		t.Errorf("the first line is %s", first)
	}
}

func TestSweepAsParquet(t *testing.T) {
	out := filepath.Join(t.TempDir(), "out.parquet")
	got := regimed(pileJSON, "sweep", "-", "--axis", "motion.amplitude=1..100 mm:50", "-o", out)
	if got.status != statusMet || got.out != "" || got.errOut != "" {
		t.Fatalf("%+v", got)
	}
	data := contents(t, out)
	f, err := parquet.OpenFile(strings.NewReader(data), int64(len(data)))
	if err != nil {
		t.Fatal(err)
	}
	if end, _ := f.Lookup("regimed.end"); f.NumRows() != 50 || end != `{"state":"complete","points":50,"problems":0}` {
		t.Errorf("%d rows, %s", f.NumRows(), end)
	}
}

// What is wrong is said at once, each at its place: in the file, or in a flag.
func TestSweepRefuses(t *testing.T) {
	pile := file(t, "pile.yaml", pileYAML)
	bad := file(t, "bad.yaml", "structure:\n  kind: cylinder\n  diameter: 1 kg\n")
	plan := file(t, "plan.yaml", "case: {structure: {kind: cylinder, diameter: 1 m}}\naxes:\n  - input: flow.sped\n    values: [1 m/s]\nformat: xml\n")
	taken := file(t, "out.csv", "something else\n")
	axis := "motion.amplitude=1..100 mm:5"
	rows := []struct {
		args []string
		want []string // parts of what is said
	}{
		{[]string{}, []string{"name one file", "--help"}},
		{[]string{pile}, []string{"--axis: out-of-range"}},
		{[]string{pile, pile}, []string{"got 2 arguments"}},
		{[]string{"--plan", plan, pile}, []string{"--plan holds"}},
		{[]string{"--plan", plan}, []string{plan + ":3: /axes/0/input: unknown-field", "flow.speed?", plan + ":5: /format: unknown-choice"}},
		{[]string{bad, "-a", "flow.sped=1,2", "-c", "clas"}, []string{bad + ":3: /structure/diameter: wrong-dimension", `--axis "flow.sped=1,2": unknown-field`, `--column "clas": unknown-choice`}},
		{[]string{pile, "-a", axis, "-a", axis}, []string{`--axis "` + axis + `": duplicate`}},
		{[]string{pile, "-a", axis, "--format", "xml"}, []string{`"xml"`, "ndjson, csv or parquet"}},
		{[]string{pile, "-a", axis, "--format", "cvs"}, []string{"Did you mean csv?"}},
		{[]string{pile, "-a", axis, "-o", "out.txt"}, []string{"--format"}},
		{[]string{pile, "-a", axis, "-f", "parquet"}, []string{"needs --output"}},
		{[]string{pile, "-a", axis, "-o", "x.parquet", "--resume"}, []string{"can't be gone on with"}},
		{[]string{pile, "-a", axis, "--resume"}, []string{"--resume needs --output"}},
		{[]string{pile, "-a", axis, "--shards", "0"}, []string{"--shards 0"}},
		{[]string{pile, "-a", axis, "--shards", "2", "--index", "2"}, []string{"--index 2"}},
		{[]string{pile, "-a", axis, "--index", "0"}, []string{"--index needs --shards"}},
		{[]string{pile, "-a", axis, "-o", taken, "--resume"}, []string{"can't be gone on with: line 1"}},
		{[]string{pile, "-a", axis, "-o", filepath.Join(taken, "x.csv")}, []string{"not a directory"}},
	}
	for _, row := range rows {
		got := regimed("", append([]string{"sweep"}, row.args...)...)
		if got.status != statusRefuse || got.out != "" {
			t.Errorf("%v: status %d, prints %.200s", row.args, got.status, got.out)
		}
		for _, part := range row.want {
			if !strings.Contains(got.errOut, part) {
				t.Errorf("%v: %s, without %q", row.args, got.errOut, part)
			}
		}
	}
	if len(rows) != 18 {
		t.Errorf("%d rows", len(rows))
	}
	if contents(t, taken) != "something else\n" {
		t.Error("a file that is no sweep was changed")
	}
}

// stopper takes what is written and ends a context after some of it.
type stopper struct {
	bytes.Buffer
	after int
	stop  func()
}

func (s *stopper) Write(p []byte) (int, error) {
	if s.Len() > s.after {
		s.stop()
	}
	return s.Buffer.Write(p)
}

// A sweep that is stopped says so, and goes on later to the very file that an
// undisturbed run makes.
func TestSweepStopsAndGoesOn(t *testing.T) {
	pile := file(t, "pile.yaml", pileYAML)
	for _, format := range []string{"ndjson", "csv"} {
		args := []string{"sweep", pile, "--axis", "motion.amplitude=1..100 mm:2000", "--column", "class", "--column", "keulegan_carpenter", "--format", format}
		whole := regimed("", args...)
		if whole.status != statusMet {
			t.Fatalf("%+v", whole)
		}
		ctx, cancel := context.WithCancel(context.Background())
		out, errOut := &stopper{after: 10_000, stop: cancel}, &bytes.Buffer{}
		if got := runContext(ctx, args, strings.NewReader(""), out, errOut); got != statusInterrupted || !strings.Contains(errOut.String(), "interrupted after ") {
			t.Errorf("%s: status %d, %s", format, got, errOut)
		}
		if last := lastLine(out.String()); !strings.Contains(last, "interrupted") {
			t.Errorf("%s: the last line is %s", format, last)
		}
		path := file(t, "out."+format, out.String())
		for range 2 { // a whole file stays as it is
			got := regimed("", append(args, "-o", path, "--resume")...)
			if got.status != statusMet || contents(t, path) != whole.out {
				t.Errorf("%s: %+v", format, got)
			}
		}
		fresh := filepath.Join(t.TempDir(), "new."+format)
		if got := regimed("", append(args, "-o", fresh, "--resume")...); got.status != statusMet || contents(t, fresh) != whole.out {
			t.Errorf("%s: a file that was not there: %+v", format, got)
		}
		if got := regimed("", append(args, "--column", "one-way", "-o", path, "--resume")...); got.status != statusRefuse || contents(t, path) != whole.out {
			t.Errorf("%s: another plan: %+v", format, got)
		}
		cancel()
	}
}

func lastLine(text string) string {
	lines := strings.Split(strings.TrimSpace(text), "\n")
	return lines[len(lines)-1]
}

// Points with a problem are counted, and no failure.
func TestSweepCountsProblems(t *testing.T) {
	got := regimed(pileJSON, "sweep", "-", "--axis", "fluid.temperature=-40..40 degC:3", "--column", "class")
	if got.status != statusMet || !strings.Contains(got.errOut, "1 of 3 points can't be computed") || !strings.Contains(got.out, `"problem":"/fluid/temperature: `) {
		t.Errorf("%+v", got)
	}
}

// Progress is said where it is asked for.
func TestSweepProgress(t *testing.T) {
	got := regimed(pileJSON, "sweep", "-", "--axis", "motion.amplitude=1..100 mm:200", "--column", "class", "--progress")
	if got.status != statusMet || !strings.HasSuffix(got.errOut, "100.0 %  200 of 200 points\n") {
		t.Errorf("%+v", got)
	}
	rows := []struct {
		done, problems int64
		since          time.Duration
		want           string
	}{
		{100, 0, 10 * time.Second, " 25.0 %  100 of 400 points, about 30s left"},
		{200, 3, 10 * time.Second, " 50.0 %  200 of 400 points, 3 with a problem, about 10s left"},
		{400, 0, time.Minute, "100.0 %  400 of 400 points"},
	}
	p := newProgress(io.Discard, true, 0, 400)
	for _, row := range rows {
		if text := p.line(row.done, row.problems, row.since); text != row.want {
			t.Errorf("%q, want %q", text, row.want)
		}
	}
	behind := newProgress(io.Discard, true, 100, 400)
	if text := behind.line(200, 0, 10*time.Second); text != " 50.0 %  200 of 400 points, about 20s left" {
		t.Errorf("after a resume: %q", text)
	}
}

// Shards of a sweep are files of their own; their rows in order are the whole.
func TestSweepShards(t *testing.T) {
	args := []string{"sweep", "-", "--axis", "motion.amplitude=1..100 mm:25", "--column", "class", "--format", "csv"}
	rowsOf := func(text string) []string {
		lines := strings.SplitAfter(text, "\n")
		return lines[1 : len(lines)-2]
	}
	whole := rowsOf(regimed(pileJSON, args...).out)
	var parts []string
	for i := range 4 {
		parts = append(parts, rowsOf(regimed(pileJSON, append(args, "--shards", "4", "--index", fmt.Sprint(i))...).out)...)
	}
	if !slices.Equal(whole, parts) || len(whole) != 25 {
		t.Errorf("%d rows in parts, %d in one", len(parts), len(whole))
	}
}

// A disk that is full is said, and what was written stays.
func TestSweepWriteFails(t *testing.T) {
	if _, err := os.Stat("/dev/full"); err != nil {
		t.Log("no /dev/full here: the failing writer of package table stands for it")
		return
	}
	got := regimed(pileJSON, "sweep", "-", "--axis", "motion.amplitude=1..100 mm:25", "--format", "csv", "-o", "/dev/full")
	if got.status != statusRefuse || !strings.Contains(got.errOut, "no space left") {
		t.Errorf("%+v", got)
	}
}
