package main

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"io"
	"net/http"
	"net/http/httptest"
	"os"
	"os/exec"
	"path/filepath"
	"strings"
	"testing"
	"time"

	"github.com/klauspost/compress/gzip"

	"regimed/api"
	"regimed/api/batch"
	"regimed/api/batch/batchtest"
)

// batchOf is a batch of so many lines, one among a hundred broken.
func batchOf(t testing.TB, lines int64) string {
	t.Helper()
	data, err := io.ReadAll(source(t).Reader(lines))
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

func source(t testing.TB) *batchtest.Source {
	t.Helper()
	s, err := batchtest.New("../../testdata/cases")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

func contents(t testing.TB, path string) string {
	t.Helper()
	data, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}

func packed(t testing.TB, text string) string {
	t.Helper()
	var out bytes.Buffer
	w := gzip.NewWriter(&out)
	if _, err := w.Write([]byte(text)); err != nil {
		t.Fatal(err)
	}
	if err := w.Close(); err != nil {
		t.Fatal(err)
	}
	return out.String()
}

func unpacked(t testing.TB, data string) string {
	t.Helper()
	r, err := gzip.NewReader(strings.NewReader(data))
	if err != nil {
		t.Fatal(err)
	}
	text, err := io.ReadAll(r)
	if err != nil {
		t.Fatal(err)
	}
	return string(text)
}

// The command and the service give the same bytes, wherever they come from and
// go to.
func TestBatchIsThatOfTheService(t *testing.T) {
	in := batchOf(t, 700)
	for query, flags := range map[string][]string{
		"?fields=kind,recommendation": {"--fields", "kind,recommendation"},
		"":                            nil,
	} {
		r := httptest.NewRequest(http.MethodPost, "/v1/batch"+query, strings.NewReader(in))
		r.Header.Set("Content-Type", "application/x-ndjson")
		w := httptest.NewRecorder()
		api.New(api.Config{}).Handler().ServeHTTP(w, r)
		want := w.Body.String()
		if n := strings.Count(want, "\n"); n != 701 {
			t.Fatalf("%d lines", n)
		}
		plain, zipped, out := file(t, "in.ndjson", in), file(t, "in.ndjson.gz", packed(t, in)), filepath.Join(t.TempDir(), "out.ndjson.gz")
		ran := 0
		for _, way := range []struct {
			stdin string
			args  []string
		}{
			{in, nil}, {in, []string{"-"}}, {"", []string{plain}}, {"", []string{zipped, "--workers", "3"}}, {packed(t, in), []string{"-"}}, {"", []string{zipped, "-o", out}},
		} {
			got := regimed(way.stdin, append(append([]string{"batch"}, flags...), way.args...)...)
			if len(way.args) == 3 && way.args[1] == "-o" {
				got.out = unpacked(t, contents(t, out))
			}
			if got.status != statusUnmet || got.out != want || got.errOut != "regimed: 7 of 700 lines with a problem\n" {
				t.Errorf("%v: status %d, %d bytes, want %d; %s", way.args, got.status, len(got.out), len(want), got.errOut)
			}
			ran++
		}
		if ran != 6 {
			t.Errorf("%d ways", ran)
		}
	}
}

func TestBatchStatus(t *testing.T) {
	line := strings.Join(strings.Fields(pileJSON), " ") + "\n"
	zipped := packed(t, strings.Repeat(line, 3))
	same := file(t, "same.ndjson", line)
	rows := []struct {
		stdin  string
		args   []string
		status int
		says   string
	}{
		{line, nil, statusMet, ""},
		{"", nil, statusMet, ""},
		{line + "x", nil, statusUnmet, "1 of 2 lines with a problem"},
		{line, []string{"--line-limit", "20"}, statusUnmet, "1 of 1 line with a problem"},
		{zipped[:len(zipped)-10], nil, statusRefuse, "(standard input): after line 3: unexpected EOF"},
		{"\x1f\x8bx", nil, statusRefuse, "(standard input): it begins as gzip and is none"},
		{"", []string{same + ".not"}, statusRefuse, "no such file"},
		{"", []string{same, same}, statusRefuse, "got 2 arguments"},
		{"", []string{same, "-o", same}, statusRefuse, "is the input and can't be the output"},
		{"", []string{same, "-o", filepath.Join(same, "x")}, statusRefuse, "not a directory"},
		{line, []string{"--fields", "recomendation"}, statusRefuse, "did you mean recommendation?"},
		{line, []string{"--samples", "1"}, statusRefuse, "--samples is from 64"},
		{line, []string{"--workers", "-1"}, statusRefuse, "--workers -1: want 1 or more"},
		{line, []string{"--line-limit", "0"}, statusRefuse, "--line-limit 0: want 1"},
		{line, []string{"--shards", "0"}, statusRefuse, "--shards 0: want 1 or more"},
		{line, []string{"--shards", "3", "--index", "3"}, statusRefuse, "--index 3: with --shards 3 want 0 to 2"},
		{line, []string{"--resume"}, statusRefuse, "--resume needs --output"},
	}
	for _, row := range rows {
		got := regimed(row.stdin, append([]string{"batch", "--fields", "kind"}, row.args...)...)
		if got.status != row.status || !strings.Contains(got.errOut, row.says) || row.says == "" && got.errOut != "" {
			t.Errorf("%v: status %d, says %q, want %d and %q", row.args, got.status, got.errOut, row.status, row.says)
		}
	}
	if len(rows) != 17 {
		t.Errorf("%d rows", len(rows))
	}
}

// Wherever a plain or a packed output was cut off, --resume completes it to the
// bytes that an undisturbed run writes.
func TestBatchResumes(t *testing.T) {
	in := file(t, "in.ndjson", batchOf(t, 400))
	for _, name := range []string{"out.ndjson", "out.ndjson.gz"} {
		out := filepath.Join(t.TempDir(), name)
		args := []string{"batch", in, "--fields", "title,kind", "-o", out}
		if got := regimed("", args...); got.status != statusUnmet {
			t.Fatalf("%+v", got)
		}
		whole := contents(t, out)
		cuts := []int{0, 1, 5, 12, len(whole) / 3, len(whole) / 2, len(whole) - 100, len(whole) - 20, len(whole) - 1, len(whole)}
		for _, cut := range cuts {
			if err := os.WriteFile(out, []byte(whole[:cut]), 0o600); err != nil {
				t.Fatal(err)
			}
			got := regimed("", append(args, "--resume")...)
			if now := contents(t, out); got.status != statusUnmet || now != whole {
				t.Errorf("%s from byte %d: status %d, %d bytes, want %d: %s", name, cut, got.status, len(now), len(whole), got.errOut)
			}
		}
		if err := os.Remove(out); err != nil {
			t.Fatal(err)
		}
		if got := regimed("", append(args, "--resume")...); got.status != statusUnmet || contents(t, out) != whole {
			t.Errorf("%s from nothing: %+v", name, got)
		}
		if left, err := os.ReadDir(filepath.Dir(out)); err != nil || len(left) != 1 {
			t.Errorf("left behind: %v, %v", left, err)
		}
	}
}

// An output that belongs to something else is refused, and stays as it is.
func TestBatchResumesNothingElse(t *testing.T) {
	in, other := file(t, "in.ndjson", batchOf(t, 20)), file(t, "other.ndjson", batchOf(t, 10))
	for _, ending := range []string{"", ".gz"} {
		former := filepath.Join(t.TempDir(), "out.ndjson"+ending)
		if got := regimed("", "batch", in, "--fields", "title", "-o", former); got.status != statusMet {
			t.Fatalf("%+v", got)
		}
		text := file(t, "text"+ending, "Dear Sir or Madam\n")
		ran := 0
		for _, row := range [][]string{
			{in, "-o", former, "--fields", "kind"},
			{in, "-o", former, "--fields", "title", "--shards", "2"},
			{other, "-o", former, "--fields", "title"},
			{in, "-o", text},
		} {
			before := contents(t, row[2])
			got := regimed("", append([]string{"batch", "--resume"}, row...)...)
			if got.status != statusRefuse || !strings.Contains(got.errOut, "can't be gone on with") || contents(t, row[2]) != before {
				t.Errorf("%v: %+v", row, got)
			}
			if left, err := os.ReadDir(filepath.Dir(row[2])); err != nil || len(left) != 1 {
				t.Errorf("left behind: %v, %v", left, err)
			}
			ran++
		}
		if ran != 4 {
			t.Errorf("%d rows", ran)
		}
	}
}

// gate is an input that says when it has been read so far that its reader waits.
type gate struct {
	text  io.Reader
	empty func()
}

func (g *gate) Read(p []byte) (int, error) {
	n, err := g.text.Read(p)
	if errors.Is(err, io.EOF) {
		g.empty()
		select {} // as a terminal at which nobody types
	}
	return n, err
}

// An interrupt leaves a readable file with a mark, from which --resume goes on.
func TestBatchInterrupted(t *testing.T) {
	text := batchOf(t, 300)
	in := file(t, "in.ndjson", text)
	for _, name := range []string{"out.ndjson", "out.ndjson.gz"} {
		whole := filepath.Join(t.TempDir(), name)
		args := []string{"batch", "--fields", "title", "-o"}
		if got := regimed("", append(args, whole, in)...); got.status != statusUnmet {
			t.Fatalf("%+v", got)
		}
		out := filepath.Join(t.TempDir(), name)
		ctx, interrupt := context.WithCancel(context.Background())
		var errOut bytes.Buffer
		half := strings.Join(strings.SplitAfter(text, "\n")[:150], "")
		code := runContext(ctx, append(args, out), &gate{strings.NewReader(half), interrupt}, io.Discard, &errOut)
		if code != statusInterrupted || !strings.Contains(errOut.String(), "; the same command with --resume goes on") {
			t.Errorf("%s: status %d, %s", name, code, errOut.String())
		}
		got := contents(t, out)
		if strings.HasSuffix(name, ".gz") {
			got = unpacked(t, got)
		}
		lines := strings.Split(got, "\n")
		if mark := lines[len(lines)-2]; !strings.HasPrefix(mark, fmt.Sprintf(`{"end":{"state":"interrupted","lines":%d,`, len(lines)-2)) {
			t.Errorf("%s: %d lines, %s", name, len(lines)-2, mark)
		}
		if got := regimed("", append(args, out, in, "--resume")...); got.status != statusUnmet || contents(t, out) != contents(t, whole) {
			t.Errorf("%s: gone on: %+v", name, got)
		}
	}
}

// Shards cover every line exactly once; grep and sort put them together to what
// the whole gives, as the help says.
func TestBatchShards(t *testing.T) {
	in, dir := file(t, "in.ndjson", batchOf(t, 250)), t.TempDir()
	for i := range 4 {
		got := regimed("", "batch", in, "--fields", "title", "--shards", "4", "--index", fmt.Sprint(i), "-o", filepath.Join(dir, fmt.Sprintf("part-%d.ndjson", i)))
		if want := map[bool]int{true: statusUnmet, false: statusMet}[i == 0]; got.status != want { // 37, 137 and 237 less 1 are multiples of 4
			t.Errorf("%+v", got)
		}
	}
	merge := exec.Command("sh", "-c", `grep -h '^{"line"' part-*.ndjson | sort -t: -k2,2n`)
	merge.Dir = dir
	merged, err := merge.Output()
	if err != nil {
		t.Fatal(err)
	}
	whole := regimed("", "batch", in, "--fields", "title").out
	if lines := strings.SplitAfter(whole, "\n"); string(merged) != strings.Join(lines[:len(lines)-2], "") {
		t.Error("the parts together are not the whole")
	}
}

func TestBatchProgress(t *testing.T) {
	got := regimed(batchOf(t, 50), "batch", "--fields", "kind", "--progress")
	if !strings.HasPrefix(got.errOut, "complete: 49 answered, 1 with a problem; 50 lines in ") {
		t.Error(got.errOut)
	}
	tally := batch.Tally{Lines: 2000, Answers: 1990, Problems: 10}
	for _, row := range []struct {
		from, read, size int64
		want             string
	}{
		{0, 500, 0, "line 2000, 250 lines/s, 10 with a problem"},
		{0, 500, 2000, "line 2000, 250 lines/s, 10 with a problem, 25.0 % of the input, about 12s left"},
		{1000, 1500, 2000, "line 2000, 250 lines/s, 10 with a problem, 75.0 % of the input, about 4s left"},
		{1000, 1000, 2000, "line 2000, 250 lines/s, 10 with a problem, 50.0 % of the input"},
	} {
		if got := progressText(tally, 1000, 4*time.Second, row.from, row.read, row.size); got != row.want {
			t.Errorf("got %q, want %q", got, row.want)
		}
	}
}

// A disk that is full is said once.
func TestBatchOnAFullDisk(t *testing.T) {
	if _, err := os.Stat("/dev/full"); err != nil {
		t.Log("no /dev/full here: the failing writer of package batch stands for it")
		return
	}
	got := regimed(batchOf(t, 40), "batch", "-", "-o", "/dev/full")
	if got.status != statusRefuse || strings.Count(got.errOut, "no space left") != 1 {
		t.Errorf("status %d: %s", got.status, got.errOut)
	}
}
