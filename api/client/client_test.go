package client_test

import (
	"bytes"
	"context"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"net/http"
	"net/http/httptest"
	"os"
	"os/exec"
	"slices"
	"strings"
	"testing"
	"time"

	"regimed/api"
	"regimed/api/client"
	"regimed/api/store"
)

const riser = `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "length": "60 m", "mass_per_length": "145 kg/m", "frequency_dry": "0.5 Hz"},
	"fluid": "seawater", "flow": {"speed": "1.2 kn"}}`

// service is a client of a real service with records of its own.
func service(t *testing.T) *client.Client {
	t.Helper()
	records, err := store.OpenSQLite(context.Background(), t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	now := time.Date(2026, 7, 30, 9, 0, 0, 0, time.UTC)
	clock := func() time.Time { now = now.Add(time.Minute); return now }
	server := httptest.NewServer(api.New(api.Config{Records: records, Clock: clock}).Handler())
	t.Cleanup(func() {
		server.Close()
		if err := records.Close(); err != nil {
			t.Error(err)
		}
	})
	return client.New(server.URL + "/")
}

// A case is sent as bytes, as text, or as what Go makes of it, and each time the
// answer is the same.
func TestClassify(t *testing.T) {
	c := service(t)
	var decoded map[string]any
	if err := json.Unmarshal([]byte(riser), &decoded); err != nil {
		t.Fatal(err)
	}
	var first *client.Answer
	for _, kase := range []any{riser, []byte(riser), json.RawMessage(riser), decoded} {
		a, err := c.Classify(t.Context(), kase, client.Parameters{})
		if err != nil {
			t.Fatal(err)
		}
		if first == nil {
			first = a
		}
		if a.Digest != first.Digest || len(a.Digest) != 64 || a.Recommendation.Class == "" || a.Recommendation.Axes["coupling"] == "" || a.Kind != "cylinder" {
			t.Errorf("%T: %+v", kase, a.Recommendation)
		}
		f := a.Findings["no-lock-in"]
		if len(a.Groups) < 5 || f.Verdict == "" || f.Because == "" || len(a.Cautions) == 0 || a.Groups["reynolds"].Value == nil || a.Groups["reynolds"].Symbol == "" {
			t.Errorf("%T: %+v, %+v", kase, f, a.Groups["reynolds"])
		}
		if !json.Valid(a.Raw) {
			t.Error("no JSON in Raw")
		}
	}
	a, err := c.Classify(t.Context(), riser, client.Parameters{Fields: []string{"recommendation", "kind"}})
	if err != nil || len(a.Groups) != 0 || a.Recommendation.Class != first.Recommendation.Class {
		t.Errorf("%v: %+v", err, a)
	}
}

// What the service says is wrong comes as a problem with its violations.
func TestProblem(t *testing.T) {
	_, err := service(t).Classify(t.Context(), `{"structure": {"kind": "cylinder", "diameter": "0.3 kg", "lenght": "1 m"}}`, client.Parameters{})
	var p *client.Problem
	if !errors.As(err, &p) {
		t.Fatalf("%v", err)
	}
	if p.Type != "/problems/invalid-case" || p.Status != 422 || len(p.Violations) != 2 || p.Instance == "" {
		t.Errorf("%+v", p)
	}
	for _, v := range p.Violations {
		if v.Pointer == "" || v.Code == "" || v.Detail == "" || len(v.Value) == 0 || !strings.Contains(err.Error(), v.Detail) {
			t.Errorf("%+v is not in %s", v, err)
		}
	}
}

func compact(t *testing.T, text string) string {
	t.Helper()
	var b bytes.Buffer
	if err := json.Compact(&b, []byte(text)); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

func TestRecords(t *testing.T) {
	c := service(t)
	ctx := t.Context()
	made, isNew, err := c.CreateRecord(ctx, client.RecordRequest{Case: riser, Title: "Riser", Tags: []string{"riser", "b"}, Author: "M. Vane"})
	if err != nil || !isNew {
		t.Fatalf("%t, %v", isNew, err)
	}
	if made.ID != made.Answer.Digest || made.Title != "Riser" || made.Author != "M. Vane" || !slices.Equal(made.Tags, []string{"riser", "b"}) || made.Kind != "cylinder" ||
		made.Class != made.Answer.Recommendation.Class || made.Engine.Version == "" || made.Created.Year() != 2026 || string(made.Case) != compact(t, riser) {
		t.Errorf("%+v", made.RecordHead)
	}
	if again, isNew, err := c.CreateRecord(ctx, client.RecordRequest{Case: riser, Title: "Other"}); err != nil || isNew || again.Title != "Riser" {
		t.Errorf("%v, %t: %+v", err, isNew, again)
	}
	for _, id := range []string{made.ID, made.ID[:12]} {
		got, err := c.Record(ctx, id)
		if err != nil || got.ID != made.ID || string(got.Answer.Raw) != string(made.Answer.Raw) {
			t.Errorf("%s: %v", id, err)
		}
	}
	if raw, err := c.RecordAs(ctx, made.ID, "json"); err != nil || string(raw) != string(made.Answer.Raw) {
		t.Errorf("%v: %s", err, raw)
	}
	if text, err := c.RecordAs(ctx, made.ID, "txt"); err != nil || !strings.HasPrefix(string(text), "Recommended") {
		t.Errorf("%v: %s", err, text)
	}
	if err := c.DeleteRecord(ctx, made.ID); err != nil {
		t.Error(err)
	}
	var p *client.Problem
	if _, err := c.Record(ctx, made.ID); !errors.As(err, &p) || p.Status != http.StatusNotFound {
		t.Errorf("%v", err)
	}
}

// The list goes from page to page, as far as it is read.
func TestRecordList(t *testing.T) {
	c := service(t)
	ctx := t.Context()
	const count = 7
	for i := range count {
		kase := strings.Replace(riser, "60 m", fmt.Sprintf("%d m", 60+i), 1)
		if _, _, err := c.CreateRecord(ctx, client.RecordRequest{Case: kase, Title: fmt.Sprint("Riser ", i), Tags: []string{fmt.Sprint(i % 2)}}); err != nil {
			t.Fatal(err)
		}
	}
	list := func(q client.RecordQuery, most int) (titles []string) {
		for head, err := range c.Records(ctx, q) {
			if err != nil {
				t.Fatal(err)
			}
			if titles = append(titles, head.Title[6:]); len(titles) == most {
				break
			}
		}
		return titles
	}
	day := time.Date(2026, 7, 30, 9, 4, 0, 0, time.UTC)
	rows := []struct {
		query client.RecordQuery
		most  int
		want  string
	}{
		{client.RecordQuery{PageSize: 2}, 100, "6 5 4 3 2 1 0"},
		{client.RecordQuery{}, 100, "6 5 4 3 2 1 0"},
		{client.RecordQuery{PageSize: 2}, 3, "6 5 4"},
		{client.RecordQuery{Tag: "1", PageSize: 1}, 100, "5 3 1"},
		{client.RecordQuery{Kind: "plate"}, 100, ""},
		{client.RecordQuery{Text: "RISER 4", Kind: "cylinder"}, 100, "4"},
		{client.RecordQuery{From: day}, 100, "6 5 4 3"},
		{client.RecordQuery{To: day}, 100, "2 1 0"},
	}
	for _, row := range rows {
		if got := strings.Join(list(row.query, row.most), " "); got != row.want {
			t.Errorf("%+v: %s", row.query, got)
		}
	}
	if len(rows) != 8 {
		t.Errorf("%d rows", len(rows))
	}
	seen := 0
	for _, err := range c.Records(ctx, client.RecordQuery{Kind: "cilinder"}) {
		var p *client.Problem
		if seen++; !errors.As(err, &p) || p.Violations[0].Pointer != "/kind" {
			t.Errorf("%v", err)
		}
	}
	if seen != 1 {
		t.Errorf("%d steps", seen)
	}
}

// fake answers every request alike.
func fake(t *testing.T, handler http.HandlerFunc) *client.Client {
	t.Helper()
	server := httptest.NewServer(handler)
	t.Cleanup(server.Close)
	return client.New(server.URL, client.WithToken("secret"), client.WithHTTP(server.Client()))
}

func TestBatch(t *testing.T) {
	lines, err := client.Lines(riser, []byte("{\n}"), map[string]any{"structure": nil})
	if err != nil {
		t.Fatal(err)
	}
	c := fake(t, func(w http.ResponseWriter, r *http.Request) {
		body, err := io.ReadAll(r.Body)
		if err != nil || strings.Count(string(body), "\n") != 3 || !strings.HasSuffix(string(body), "\n{}\n{\"structure\":null}\n") {
			t.Errorf("%v: %s", err, body)
		}
		if r.URL.String() != "/v1/batch?fields=kind&samples=100&what_if=false" || r.Header.Get("Authorization") != "Bearer secret" || r.Header.Get("Content-Type") != "application/x-ndjson" {
			t.Errorf("%s %v", r.URL, r.Header)
		}
		io.WriteString(w, `{"line":1,"id":"a7","answer":{"kind":"cylinder","new_member":1}}`+"\n\n"+
			`{"line":2,"problem":{"type":"/problems/invalid-case","title":"Invalid case","status":422,"detail":"The case has 1 violation.","violations":[{"pointer":"/structure","code":"missing-field","detail":"structure is needed."}]}}`+"\n"+
			`{"end":{"state":"complete","lines":3,"answers":1,"problems":1}}`+"\n")
	})
	var got []client.Line
	for line, err := range c.Batch(t.Context(), lines, client.Parameters{Fields: []string{"kind"}, Samples: 100, NoWhatIf: true}) {
		if err != nil {
			t.Fatal(err)
		}
		got = append(got, line)
	}
	if len(got) != 2 || got[0].Number != 1 || string(got[0].ID) != `"a7"` || got[0].Answer.Kind != "cylinder" || got[0].Problem != nil {
		t.Fatalf("%+v", got)
	}
	if p := got[1].Problem; got[1].Answer != nil || p == nil || p.Violations[0].Code != "missing-field" {
		t.Errorf("%+v", got[1])
	}
}

// A real service answers a batch line by line, with what was asked for and as
// it answers a case by itself.
func TestBatchOfTheService(t *testing.T) {
	c := service(t)
	ctx := t.Context()
	uncertain := strings.Replace(riser, "1.2 kn", "1.2 +- 0.3 kn", 1)
	bad := strings.Replace(riser, "0.3 m", "0.3 kg", 1)
	for _, p := range []client.Parameters{{}, {WhatIf: true}, {NoWhatIf: true}, {Samples: 128, NoWhatIf: true}, {Fields: []string{"recommendation"}}} {
		lines, err := client.Lines(riser, bad, json.RawMessage(`{"id": "a7", "case": `+uncertain+`}`))
		if err != nil {
			t.Fatal(err)
		}
		var got []client.Line
		for line, err := range c.Batch(ctx, lines, p) {
			if err != nil {
				t.Fatalf("%+v: %v", p, err)
			}
			got = append(got, line)
		}
		if len(got) != 3 || got[0].Problem != nil || got[2].Problem != nil || string(got[2].ID) != `"a7"` {
			t.Fatalf("%+v: %+v", p, got)
		}
		if q := got[1].Problem; got[1].Answer != nil || got[1].Number != 2 || q == nil || q.Violations[0].Pointer != "/structure/diameter" {
			t.Errorf("%+v: %+v", p, got[1])
		}
		if n := len(got[0].Answer.TurningPoints); n > 0 != p.WhatIf {
			t.Errorf("%+v: %d turning points", p, n)
		}
		if !p.WhatIf {
			p.NoWhatIf = true // as a batch has it
		}
		for i, kase := range map[int]string{0: riser, 2: uncertain} {
			if alone, err := c.Classify(ctx, kase, p); err != nil || string(alone.Raw) != string(got[i].Answer.Raw) {
				t.Errorf("%+v: %v: a batch answers\n%.300s\na case by itself\n%.300s", p, err, got[i].Answer.Raw, alone.Raw)
			}
		}
	}
}

// Samples and NoWhatIf reach the service, and a record says what it was made with.
func TestParameters(t *testing.T) {
	c := service(t)
	ctx := t.Context()
	uncertain := strings.Replace(riser, "1.2 kn", "1.2 +- 0.3 kn", 1)
	full, err := c.Classify(ctx, uncertain, client.Parameters{})
	if err != nil || len(full.TurningPoints) == 0 || len(full.Recommendation.Probability) == 0 {
		t.Fatalf("%v: %+v", err, full)
	}
	less, err := c.Classify(ctx, uncertain, client.Parameters{Samples: 64, NoWhatIf: true})
	var spread struct {
		Uncertainty struct {
			Samples int `json:"samples"`
		} `json:"uncertainty"`
	}
	if err != nil || len(less.TurningPoints) != 0 {
		t.Fatalf("%v: %+v", err, less)
	}
	if err := json.Unmarshal(less.Raw, &spread); err != nil || spread.Uncertainty.Samples != 64 {
		t.Errorf("%v: %+v", err, spread)
	}
	var p *client.Problem
	if _, err := c.Classify(ctx, uncertain, client.Parameters{Samples: 1}); !errors.As(err, &p) || p.Violations[0].Pointer != "/samples" {
		t.Errorf("%v", err)
	}
	made, _, err := c.CreateRecord(ctx, client.RecordRequest{Case: uncertain, Samples: 64, NoWhatIf: true})
	if err != nil || made.Options != (client.Options{Samples: 64}) || string(made.Answer.Raw) != string(less.Raw) {
		t.Errorf("%v: %+v", err, made)
	}
	usual, _, err := c.CreateRecord(ctx, client.RecordRequest{Case: riser})
	if err != nil || usual.Options != (client.Options{Samples: 1024, WhatIf: true}) {
		t.Errorf("%v: %+v", err, usual)
	}
}

// A stream that breaks off, or is none, ends with an error, after what came.
func TestBatchThatFails(t *testing.T) {
	const good = `{"line":1,"answer":{}}` + "\n"
	rows := []struct {
		body       string
		status     int
		lines      int
		unfinished bool
	}{
		{good, 200, 1, true},
		{"", 200, 0, true},
		{good + `{"end":{"state":"interrupted","lines":1,"answers":1,"problems":0}}`, 200, 1, true},
		{good + `{"line":2`, 200, 1, false},
		{good + `{"line":2}` + "\n", 200, 1, false},
		{good + `[]` + "\n", 200, 1, false},
		{"busy", 503, 0, false},
	}
	for _, row := range rows {
		c := fake(t, func(w http.ResponseWriter, _ *http.Request) {
			w.WriteHeader(row.status)
			io.WriteString(w, row.body)
		})
		lines, failed := 0, error(nil)
		for _, err := range c.Batch(t.Context(), strings.NewReader("{}\n"), client.Parameters{}) {
			if err != nil {
				failed = err
				continue
			}
			lines++
		}
		if lines != row.lines || failed == nil || errors.Is(failed, client.ErrUnfinished) != row.unfinished {
			t.Errorf("%q: %d lines, %v", row.body, lines, failed)
		}
	}
	if len(rows) != 7 {
		t.Errorf("%d rows", len(rows))
	}
	if _, err := client.Lines("{}", "{"); err == nil || !strings.HasPrefix(err.Error(), "case 2") {
		t.Errorf("%v", err)
	}
}

// Answers are there before all lines were sent, and who stops reading ends the
// request.
func TestBatchStreams(t *testing.T) {
	ended := make(chan struct{})
	c := fake(t, func(w http.ResponseWriter, r *http.Request) {
		defer close(ended)
		if err := http.NewResponseController(w).EnableFullDuplex(); err != nil {
			t.Error(err)
		}
		io.WriteString(w, `{"line":1,"answer":{}}`+"\n")
		if err := http.NewResponseController(w).Flush(); err != nil {
			t.Error(err)
		}
		io.Copy(io.Discard, r.Body) // ends when the client leaves
	})
	in, out := io.Pipe()
	defer out.Close()
	seen := 0
	for line, err := range c.Batch(t.Context(), in, client.Parameters{}) {
		if err != nil || line.Number != 1 {
			t.Errorf("%+v, %v", line, err)
		}
		seen++
		break
	}
	<-ended
	if seen != 1 {
		t.Errorf("%d lines", seen)
	}
}

// A context that ended, an address that is none, and an answer that is no
// problem document are errors too.
func TestFaults(t *testing.T) {
	ctx, cancel := context.WithCancel(t.Context())
	cancel()
	if _, err := service(t).Classify(ctx, riser, client.Parameters{}); !errors.Is(err, context.Canceled) {
		t.Errorf("%v", err)
	}
	if _, err := client.New("http://a b").Classify(t.Context(), riser, client.Parameters{}); err == nil {
		t.Error("no error")
	}
	if _, err := service(t).Classify(t.Context(), func() {}, client.Parameters{}); err == nil {
		t.Error("no error")
	}
	c := fake(t, func(w http.ResponseWriter, _ *http.Request) { http.Error(w, "<h1>gateway</h1>", http.StatusBadGateway) })
	var p *client.Problem
	if _, err := c.Classify(t.Context(), riser, client.Parameters{}); !errors.As(err, &p) || p.Status != 502 || p.Title != "Bad Gateway" {
		t.Errorf("%v", err)
	}
	c = fake(t, func(w http.ResponseWriter, _ *http.Request) { io.WriteString(w, "<h1>welcome</h1>") })
	if _, err := c.Record(t.Context(), "0"); err == nil || !strings.Contains(err.Error(), "can't be read") {
		t.Errorf("%v", err)
	}
}

// Whoever imports the client gets nothing else with it.
func TestStandardLibraryOnly(t *testing.T) {
	list := exec.Command("go", "list", "-deps", "-f", "{{if not .Standard}}{{.ImportPath}}{{end}}", ".")
	list.Stderr = os.Stderr
	out, err := list.Output()
	if err != nil {
		t.Fatal(err)
	}
	if got := strings.Fields(string(out)); !slices.Equal(got, []string{"regimed/api/client"}) {
		t.Errorf("%q", got)
	}
}
