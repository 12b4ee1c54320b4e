package api

import (
	"bufio"
	"bytes"
	"context"
	"fmt"
	"io"
	"log/slog"
	"net/http"
	"net/http/httptest"
	"slices"
	"strings"
	"testing"
	"time"

	"github.com/getkin/kin-openapi/openapi3filter"
	"github.com/go-json-experiment/json"
	"github.com/klauspost/compress/gzip"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/whatif"
)

// sweepOf is a request for a sweep of the riser.
func sweepOf(rest string) string { return `{"case": ` + riser + `, ` + rest + `}` }

// sweptLines splits an answer into its first line, its rows and its end.
func sweptLines(t testing.TB, body []byte) (first string, rows []string, end string) {
	t.Helper()
	lines := strings.Split(strings.TrimSuffix(string(body), "\n"), "\n")
	if len(lines) < 2 {
		t.Fatalf("%d lines: %s", len(lines), body)
	}
	return lines[0], lines[1 : len(lines)-1], lines[len(lines)-1]
}

// The rows are what the classification of each varied case says.
func TestSweepRows(t *testing.T) {
	r := call(t, http.MethodPost, "/v1/sweeps", sweepOf(`"axes": [{"input": "flow.speed", "from": "0 m/s", "to": "2 m/s", "points": 9},
		{"input": "fluid.name", "values": ["seawater", "air"]}], "columns": ["class", "reynolds", "one-way.utilisation"]`))
	if r.StatusCode != http.StatusOK || r.Header.Get("Content-Type") != typeLines {
		t.Fatalf("%d, %s: %s", r.StatusCode, r.Header.Get("Content-Type"), bodyOf(t, r))
	}
	first, rows, end := sweptLines(t, bodyOf(t, r))
	if !strings.HasPrefix(first, `{"sweep":{"digest":"`) || end != `{"end":{"state":"complete","points":18,"problems":0}}` || len(rows) != 18 {
		t.Fatalf("%s … %s, %d rows", first, end, len(rows))
	}
	columns := []string{"reynolds", "one-way.utilisation"}
	for i, row := range rows {
		var got map[string]any
		if err := json.Unmarshal([]byte(row), &got); err != nil {
			t.Fatal(err)
		}
		speed, fluid := 0.25*float64(i/2), []string{"seawater", "air"}[i%2]
		if got["flow.speed"] != speed || got["fluid.name"] != fluid {
			t.Fatalf("row %d is %s", i, row)
		}
		text := strings.Replace(strings.Replace(riser, `"1.1 m/s"`, fmt.Sprintf(`"%v m/s"`, speed), 1), `"seawater"`, `"`+fluid+`"`, 1)
		c, _, err := input.Decode([]byte(text), kind.Schema())
		if err != nil || c == nil {
			t.Fatal(err)
		}
		a, _ := regime.Classify(c)
		if got["class"] != a.Recommendation.Class.ID {
			t.Errorf("row %d: class %v", i, got["class"])
		}
		for _, name := range columns {
			col, err := whatif.FindColumn(name)
			if err != nil {
				t.Fatal(err)
			}
			if x, _ := col.Number(a); got[name] != x && (got[name] != nil || x == x) {
				t.Errorf("row %d: %s is %v, want %v", i, name, got[name], x)
			}
		}
	}
}

// The form is that of the request, or the one that the client prefers.
func TestSweepForms(t *testing.T) {
	rows := []struct {
		accept, format string
		media          string
	}{
		{"", "", typeLines},
		{"*/*", "", typeLines},
		{"text/csv", "", typeCSV},
		{"text/csv;q=0.5, application/x-ndjson", "", typeLines},
		{"application/x-ndjson;q=0.1, text/csv;q=0.2", "", typeCSV},
		{"application/json", "", typeLines},
		{"text/csv", `, "format": "ndjson"`, typeLines},
		{"application/x-ndjson", `, "format": "csv"`, typeCSV},
		{"garbage;;;, text/csv", "", typeCSV},
	}
	for _, row := range rows {
		r := call(t, http.MethodPost, "/v1/sweeps", sweepOf(`"axes": ["flow.speed=1..2 m/s:3"], "columns": ["class"]`+row.format), "Accept", row.accept)
		body := bodyOf(t, r)
		if r.StatusCode != http.StatusOK || r.Header.Get("Content-Type") != row.media {
			t.Errorf("%q: %d, %s", row.accept, r.StatusCode, r.Header.Get("Content-Type"))
		}
		if isCSV := bytes.HasPrefix(body, []byte("flow.speed [m/s],class,problem\r\n1,")); isCSV != (row.media == typeCSV) {
			t.Errorf("%q: %s", row.accept, body)
		}
		if vary := r.Header.Values("Vary"); !slices.Contains(vary, "Accept") {
			t.Errorf("varies by %v", vary)
		}
	}
	if len(rows) != 9 {
		t.Errorf("%d rows", len(rows))
	}
}

// Parts of a sweep are asked for by shards and index; an answer may be packed.
func TestSweepParts(t *testing.T) {
	const rest = `"axes": ["flow.speed=0.1..2 m/s:100:log"], "columns": ["class", "reynolds"]`
	_, whole, _ := sweptLines(t, bodyOf(t, call(t, http.MethodPost, "/v1/sweeps", sweepOf(rest))))
	var parts []string
	for i := range 3 {
		r := call(t, http.MethodPost, "/v1/sweeps", sweepOf(fmt.Sprintf(`%s, "shards": 3, "index": %d`, rest, i)), "Accept-Encoding", "gzip")
		if r.Header.Get("Content-Encoding") != "gzip" {
			t.Fatalf("the coding is %q", r.Header.Get("Content-Encoding"))
		}
		unpacked, err := gzip.NewReader(r.Body)
		if err != nil {
			t.Fatal(err)
		}
		body, err := io.ReadAll(unpacked)
		if err != nil {
			t.Fatal(err)
		}
		_, rows, _ := sweptLines(t, body)
		parts = append(parts, rows...)
	}
	if !slices.Equal(whole, parts) || len(whole) != 100 {
		t.Errorf("%d rows in parts, %d in one", len(parts), len(whole))
	}
}

// Progress comes between the rows, where it is asked for.
func TestSweepProgress(t *testing.T) {
	_, rows, _ := sweptLines(t, bodyOf(t, call(t, http.MethodPost, "/v1/sweeps", sweepOf(`"axes": ["flow.speed=1..2 m/s:1000"], "columns": ["class"], "progress": true`))))
	isProgress := func(line string) bool { return strings.HasPrefix(line, `{"progress":`) }
	said := 0
	for _, line := range rows {
		if isProgress(line) {
			said++
		}
	}
	if last := rows[len(rows)-1]; last != `{"progress":{"points":1000,"problems":0,"of":1000}}` || len(rows)-said != 1000 || said < 10 || said > 100 {
		t.Errorf("%d lines, %d of progress, the last %s", len(rows), said, last)
	}
}

// What is wrong with a request is a problem, before anything is sent.
func TestSweepRefuses(t *testing.T) {
	small := New(Config{SweepLimit: 10}).Handler()
	rows := []struct {
		body    string
		status  int
		problem string
		want    []string // pointers, or parts of the detail
	}{
		{`{"case"`, 400, "malformed-json", nil},
		{`{}`, 422, "invalid-case", []string{"/axes", "/case"}},
		{sweepOf(`"axes": ["flow.sped=1,2", {"input": "fluid.name", "values": ["watter"]}], "columns": ["x"], "format": "parquet"`), 422, "invalid-case",
			[]string{"/axes/0", "/axes/1/values/0", "/columns/0", "/format"}},
		{sweepOf(`"axes": ["flow.speed=1..2 m/s:2"], "format": "csv", "progress": true`), 422, "invalid-case", []string{"/progress"}},
		{sweepOf(`"axes": ["flow.speed=1..2 m/s:11"]`), 422, "too-many-points", []string{"11 points", "up to 10", "shards", "regimed sweep --plan"}},
		{sweepOf(`"axes": ["flow.speed=1..2 m/s:11"], "shards": 2`), 200, "", nil},
	}
	for _, row := range rows {
		r := httptest.NewRequest(http.MethodPost, "/v1/sweeps", strings.NewReader(row.body))
		r.Header.Set("Content-Type", "application/json")
		answer := serve(t, small, r)
		if answer.StatusCode != row.status {
			t.Errorf("%s: status %d", row.body, answer.StatusCode)
			continue
		}
		if row.status == http.StatusOK {
			continue
		}
		p := problemIn(t, answer)
		got := []string{p.Detail}
		for _, v := range p.Violations {
			got = append(got, v.Pointer)
		}
		all := strings.Join(got, "\n")
		for _, part := range row.want {
			if !strings.Contains(all, part) {
				t.Errorf("%s: %s, without %s", row.body, all, part)
			}
		}
		if p.Type != "/problems/"+row.problem {
			t.Errorf("%s: %s", row.body, p.Type)
		}
	}
	if len(rows) != 6 {
		t.Errorf("%d rows", len(rows))
	}
	for _, path := range []string{"/v1/sweeps?format=csv"} {
		if r := call(t, http.MethodPost, path, sweepOf(`"axes": []`)); r.StatusCode != http.StatusUnprocessableEntity {
			t.Errorf("%s: %d", path, r.StatusCode)
		}
	}
	if r := call(t, http.MethodPost, "/v1/sweeps", "x", "Content-Type", "text/plain"); r.StatusCode != http.StatusUnsupportedMediaType {
		t.Errorf("a text: %d", r.StatusCode)
	}
}

// Answers of every kind hold against the contract, which takes and refuses the
// shape of the same requests.
func TestSweepHoldsAgainstTheContract(t *testing.T) {
	doc, router := contract(t)
	strict := strictSchemas(t)
	op := doc.Paths.Value("/v1/sweeps").Post
	rows := []struct {
		body       string
		fits, good bool
	}{
		{sweepOf(`"axes": ["flow.speed=1..2 m/s:2"]`), true, true},
		{sweepOf(`"axes": [{"input": "flow.speed", "from": "1 m/s", "to": {"value": 2, "unit": "m/s"}, "step": "0.5 m/s"}], "columns": ["class"], "format": "csv", "shards": 2, "index": 1, "progress": false`), true, true},
		{sweepOf(`"axes": [{"input": "structure.damping_ratio", "values": [0.01, "2 %"]}, "fluid.name=air,water"]`), true, true},
		{sweepOf(`"axes": ["flow.sped=1,2"], "columns": ["x"]`), true, false},
		{sweepOf(`"axes": ["flow.speed=1..2 m/s:2000000"]`), true, false},
		{sweepOf(`"axes": []`), false, false},
		{sweepOf(`"axes": [{"input": "flow.speed", "values": []}]`), false, false},
		{sweepOf(`"axes": [{"input": "flow.speed", "from": true, "to": "1 m/s", "points": 1}]`), false, false},
		{sweepOf(`"axis": []`), false, false},
		{`{}`, false, false},
	}
	for _, row := range rows {
		r := httptest.NewRequest(http.MethodPost, "http://127.0.0.1:8610/v1/sweeps", strings.NewReader(row.body))
		r.Header.Set("Content-Type", "application/json")
		route, parameters, err := router.FindRoute(r)
		if err != nil {
			t.Fatal(err)
		}
		err = openapi3filter.ValidateRequest(context.Background(), &openapi3filter.RequestValidationInput{Request: r, PathParams: parameters, Route: route})
		if (err == nil) != row.fits {
			t.Errorf("%s: %v", row.body, err)
		}
		r.Body = io.NopCloser(strings.NewReader(row.body))
		answer := checkAgainst(t, router, r)
		if (answer.StatusCode == http.StatusOK) != row.good {
			t.Errorf("%s: status %d", row.body, answer.StatusCode)
		}
		strict.check(t, op, answer)
	}
	if len(rows) != 10 {
		t.Errorf("%d rows", len(rows))
	}
}

// logLines hands on each line of a log.
type logLines chan string

func (l logLines) Write(p []byte) (int, error) {
	l <- string(p)
	return len(p), nil
}

// endlessSweep is a sweep that takes longer than any test.
func endlessSweep() string {
	return sweepOf(`"axes": ["flow.speed=0.1..2 m/s:1000000000"], "columns": ["class"]`)
}

// postSweep asks a server that listens, and reads the first rows.
func postSweep(t testing.TB, ctx context.Context, address, body string) (*http.Response, *bufio.Reader) {
	t.Helper()
	r, err := http.NewRequestWithContext(ctx, http.MethodPost, "http://"+address+"/v1/sweeps", strings.NewReader(body))
	if err != nil {
		t.Fatal(err)
	}
	r.Header.Set("Content-Type", "application/json")
	answer, err := http.DefaultTransport.RoundTrip(r)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { answer.Body.Close() })
	lines := bufio.NewReader(answer.Body)
	for range 3 {
		if _, err := lines.ReadString('\n'); err != nil {
			t.Fatal(err)
		}
	}
	return answer, lines
}

// A client who goes away ends the work.
func TestSweepDisconnect(t *testing.T) {
	log := make(logLines, 100)
	address, _, _ := run(t, Config{SweepLimit: 1e10, Logger: slog.New(slog.NewJSONHandler(log, nil))})
	ctx, leave := context.WithCancel(context.Background())
	postSweep(t, ctx, address, endlessSweep())
	leave()
	for line := range log {
		if strings.Contains(line, `"msg":"sweep"`) {
			if !strings.Contains(line, `"state":"broken off"`) && !strings.Contains(line, `"state":"interrupted"`) {
				t.Error(line)
			}
			return // the handler has ended
		}
	}
}

// A server that stops ends the rows with a mark.
func TestSweepOfAStoppingServer(t *testing.T) {
	address, stop, stopped := run(t, Config{SweepLimit: 1e10, ShutdownTimeout: 2 * time.Second})
	_, lines := postSweep(t, context.Background(), address, endlessSweep())
	stop()
	rest, err := io.ReadAll(lines)
	if err != nil {
		t.Fatal(err)
	}
	if _, _, end := sweptLines(t, rest); !strings.HasPrefix(end, `{"end":{"state":"interrupted","points":`) {
		t.Errorf("the end is %.200s", end)
	}
	if err := <-stopped; err != nil {
		t.Error(err)
	}
}

// The rows may take longer than any other request may: neither the time for
// reading a request nor that for writing an answer cuts them off.
func TestSweepOutlastsTheTimeouts(t *testing.T) {
	address, _, _ := run(t, Config{ReadTimeout: 50 * time.Millisecond, WriteTimeout: 50 * time.Millisecond})
	_, lines := postSweep(t, context.Background(), address, sweepOf(`"axes": ["flow.speed=0.1..2 m/s:40000"], "columns": ["class"]`))
	rest, err := io.ReadAll(lines)
	if err != nil {
		t.Fatal(err)
	}
	if _, _, end := sweptLines(t, rest); end != `{"end":{"state":"complete","points":40000,"problems":0}}` {
		t.Errorf("the end is %.200s", end)
	}
}
