package api

import (
	"bufio"
	"bytes"
	"context"
	"fmt"
	"io"
	"log/slog"
	"net"
	"net/http"
	"net/http/httptest"
	"runtime"
	"strings"
	"testing"
	"time"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
	"github.com/klauspost/compress/gzip"
	"github.com/santhosh-tekuri/jsonschema/v6"

	"regimed/api/batch"
	"regimed/api/batch/batchtest"
)

// batchLine is a line of the output of a batch.
type batchLine struct {
	Line    int64          `json:"line"`
	ID      jsontext.Value `json:"id,omitzero"`
	Answer  jsontext.Value `json:"answer,omitzero"`
	Problem *Problem       `json:"problem,omitzero"`
	End     *batchEnd      `json:"end,omitzero"`
}

type batchEnd struct {
	State    string `json:"state"`
	Lines    int64  `json:"lines"`
	Answers  int64  `json:"answers"`
	Problems int64  `json:"problems"`
}

// batchLines reads an output, in which nothing may stand that is not known here.
func batchLines(t testing.TB, out io.Reader) []batchLine {
	t.Helper()
	var list []batchLine
	lines := bufio.NewScanner(out)
	lines.Buffer(nil, 1<<22)
	for lines.Scan() {
		var l batchLine
		if err := json.Unmarshal(lines.Bytes(), &l, json.RejectUnknownMembers(true)); err != nil {
			t.Fatalf("%v: %s", err, lines.Bytes())
		}
		list = append(list, l)
	}
	if err := lines.Err(); err != nil {
		t.Fatal(err)
	}
	return list
}

// callBatch sends a batch to the handler.
func callBatch(t testing.TB, h http.Handler, query, body string, headers ...string) *http.Response {
	t.Helper()
	r := httptest.NewRequest(http.MethodPost, "/v1/batch"+query, strings.NewReader(body))
	r.Header.Set("Content-Type", typeLines)
	for i := 0; i+1 < len(headers); i += 2 {
		r.Header.Set(headers[i], headers[i+1])
	}
	return serve(t, h, r)
}

// batchOf is the output of a batch that the server takes.
func batchOf(t testing.TB, h http.Handler, query, body string) []batchLine {
	t.Helper()
	r := callBatch(t, h, query, body)
	if r.StatusCode != http.StatusOK || r.Header.Get("Content-Type") != typeLines {
		t.Fatalf("status %d, %s: %s", r.StatusCode, r.Header.Get("Content-Type"), bodyOf(t, r))
	}
	return batchLines(t, r.Body)
}

func source(t testing.TB) *batchtest.Source {
	t.Helper()
	s, err := batchtest.New("../testdata/cases")
	if err != nil {
		t.Fatal(err)
	}
	return s
}

// oneLine is a text without its line breaks.
func oneLine(text string) string { return strings.Join(strings.Fields(text), " ") }

func TestBatchAnswers(t *testing.T) {
	body := "\uFEFF" + oneLine(riser) + "\r\n\n" +
		`{"id": "a 7", "case": ` + oneLine(riser) + "}\n" +
		`{"case": ` + oneLine(riser) + `, "id": -12}` + "\n" +
		`{"structure": {"kind": "cilinder"}}` + "\n" +
		oneLine(riser) // torn, and whole
	lines := batchOf(t, handler, "", body)
	if len(lines) != 6 {
		t.Fatalf("%d lines", len(lines))
	}
	want := string(bodyOf(t, call(t, http.MethodPost, "/v1/classify?what_if=false", oneLine(riser))))
	for i, l := range lines[:5] {
		if wanted := []int64{1, 3, 4, 5, 6}[i]; l.Line != wanted {
			t.Errorf("line %d where %d belongs", l.Line, wanted)
		}
		if i != 3 && string(l.Answer) != want {
			t.Errorf("line %d: %s", l.Line, l.Answer)
		}
		if wanted := []string{"", `"a 7"`, "-12", "", ""}[i]; string(l.ID) != wanted {
			t.Errorf("line %d: id %s", l.Line, l.ID)
		}
	}
	if p := lines[3].Problem; p == nil || p.Violations[0].Pointer != "/structure/kind" {
		t.Errorf("%+v", lines[3])
	}
	if e := lines[5].End; e == nil || *e != (batchEnd{"complete", 6, 4, 1}) {
		t.Errorf("%+v", lines[5])
	}
}

// Whatever POST /v1/classify says of a body, a line of a batch says.
func TestBatchProblemsAreThoseOfACase(t *testing.T) {
	var bodies []string
	for _, row := range badCases {
		bodies = append(bodies, row.body)
	}
	for _, row := range badBodies {
		bodies = append(bodies, row.body)
	}
	ran := 0
	for _, body := range bodies {
		line := strings.ReplaceAll(body, "\n", " ") // as a line must be
		if strings.Trim(line, " \t\r") == "" || strings.HasPrefix(line, "\uFEFF") {
			continue // passed over: a blank line, and a mark before the first one
		}
		lines := batchOf(t, handler, "", line+"\n")
		want := problemIn(t, call(t, http.MethodPost, "/v1/classify", strings.TrimSuffix(line, "\r")))
		if got := lines[0].Problem; got == nil || !sameProblem(t, *got, want) {
			t.Errorf("%.200s: %+v, want %+v", line, got, want)
		}
		ran++
	}
	if ran < 75 {
		t.Errorf("%d lines", ran)
	}
}

// sameProblem compares a problem of a line with one of a request, which names
// the request besides.
func sameProblem(t testing.TB, line, request Problem) bool {
	t.Helper()
	request.Instance = ""
	a, errA := json.Marshal(&line)
	b, errB := json.Marshal(&request)
	if errA != nil || errB != nil {
		t.Fatal(errA, errB)
	}
	return bytes.Equal(a, b)
}

// A case with something around it has its problems in their places in the line.
func TestBatchMembers(t *testing.T) {
	long := strings.Repeat("x", 199)
	rows := []struct {
		line, id string
		want     []string // pointers and codes; "" for none: an answer
	}{
		{`{"id": "x", "case": {"structure": {"kind": "cylinder", "diameter": "1 kg"}}}`, `"x"`, []string{"/case/structure/diameter wrong-dimension"}},
		{`{"id": "x", "case": 3}`, `"x"`, []string{"/case wrong-type"}},
		{`{"id": "x", "case": null}`, `"x"`, []string{"/case wrong-type"}},
		{`{"id": "x", "case": ` + oneLine(riser) + `, "note": 1}`, `"x"`, []string{"/note unknown-field"}},
		{`{"id": "x", "id": "y", "case": ` + oneLine(riser) + `}`, `"x"`, []string{"/id duplicate"}},
		{`{"case": ` + oneLine(riser) + `, "case": {}}`, ``, []string{"/case duplicate"}},
		{`{"id": {"a": 1}, "case": ` + oneLine(riser) + `}`, ``, []string{"/id wrong-type"}},
		{`{"id": null, "case": ` + oneLine(riser) + `}`, ``, []string{"/id wrong-type"}},
		{`{"id": 1.5, "case": ` + oneLine(riser) + `}`, ``, []string{"/id wrong-type"}},
		{`{"id": 9007199254740993, "case": ` + oneLine(riser) + `}`, ``, []string{"/id wrong-type"}},
		{`{"id": "` + long + `", "case": ` + oneLine(riser) + `}`, ``, []string{"/id out-of-range"}},
		{`{"id": 1.5, "case": {"structure": {"kind": "cylinder", "diameter": "1 kg"}}}`, ``, []string{"/case/structure/diameter wrong-dimension", "/id wrong-type"}},
		{`{"id": "x", "structure": {"kind": "cylinder"}}`, `"x"`, []string{"/id unknown-field"}},
		{`{"\u0063ase": ` + oneLine(riser) + `, "\u0069d": "é"}`, `"é"`, nil},
		{`{"id": 9007199254740992, "case": ` + oneLine(riser) + `}`, `9007199254740992`, nil},
		{`{"id": "", "case": ` + oneLine(riser) + `}`, `""`, nil},
	}
	for _, row := range rows {
		l := batchOf(t, handler, "?fields=kind", row.line)[0]
		if string(l.ID) != row.id || (l.Answer != nil) != (row.want == nil) {
			t.Errorf("%s: %+v", row.line, l)
			continue
		}
		var got []string
		if l.Problem != nil {
			for _, v := range l.Problem.Violations {
				got = append(got, v.Pointer+" "+string(v.Code))
			}
		}
		if fmt.Sprint(got) != fmt.Sprint(row.want) {
			t.Errorf("%s: %v, want %v", row.line, got, row.want)
		}
	}
	if len(rows) != 16 {
		t.Errorf("%d rows", len(rows))
	}
	torn := batchOf(t, handler, "", `{"id": "x", "case": {"structure": {"kind`)[0]
	if p := torn.Problem; string(torn.ID) != `"x"` || p == nil || p.Type != malformedJSON.URI() || *p.Offset < 30 || !strings.HasPrefix(p.Place, "/case/structure") {
		t.Errorf("torn: %+v", torn)
	}
}

// A hundred thousand lines, one among a hundred broken in one of eight ways:
// each is answered, in order, and each broken one says what is wrong with it, as
// POST /v1/classify does. Answers go on the wire while lines still arrive.
func TestBatchOfManyLines(t *testing.T) {
	const n = 100_000
	limited := New(Config{BodyLimit: batchtest.Limit}).Handler()
	server := httptest.NewServer(limited)
	defer server.Close()
	src := source(t)
	r, err := http.NewRequest(http.MethodPost, server.URL+"/v1/batch?fields=title,kind", src.Reader(n))
	if err != nil {
		t.Fatal(err)
	}
	r.Header.Set("Content-Type", typeLines)
	answer, err := server.Client().Do(r)
	if err != nil {
		t.Fatal(err)
	}
	defer answer.Body.Close()
	lines := bufio.NewScanner(answer.Body)
	lines.Buffer(nil, 1<<20)
	types := map[string]int{}
	number, problems := int64(0), int64(0)
	var room []byte
	for number < n && lines.Scan() {
		number++
		var broken bool
		room, broken = src.Append(room[:0], number)
		if broken {
			problems++
			types[checkBrokenLine(t, limited, number, room, lines.Bytes())]++
			continue
		}
		answer, found := bytes.CutPrefix(bytes.TrimSuffix(lines.Bytes(), []byte("}")), fmt.Appendf(nil, `{"line":%d,"answer":`, number))
		if !found || !bytes.Contains(answer, []byte(batchtest.Title(number)+`"`)) {
			t.Fatalf("line %d: %s", number, lines.Bytes())
		}
		if number%1000 != 1 {
			continue
		}
		if want := bodyOf(t, classifyWith(t, limited, "?fields=title,kind", room)); !bytes.Equal(want, answer) {
			t.Errorf("line %d: %s, want %s", number, answer, want)
		}
	}
	end := fmt.Sprintf(`{"end":{"state":"complete","lines":%d,"answers":%d,"problems":%d}}`, n, n-n/100, n/100)
	if number != n || problems != n/100 || !lines.Scan() || lines.Text() != end || lines.Scan() || lines.Err() != nil {
		t.Errorf("%d lines, %d problems, %v, %s", number, problems, lines.Err(), lines.Text())
	}
	if fmt.Sprint(types) != fmt.Sprint(map[string]int{malformedJSON.URI(): 250, tooLarge.URI(): 125, invalidCase.URI(): 625}) {
		t.Errorf("types: %v", types)
	}
}

func classifyWith(t testing.TB, h http.Handler, query string, body []byte) *http.Response {
	t.Helper()
	r := httptest.NewRequest(http.MethodPost, "/v1/classify"+query, bytes.NewReader(body))
	r.Header.Set("Content-Type", "application/json")
	return serve(t, h, r)
}

// checkBrokenLine holds the problem of a line against that of a request. It
// returns the type.
func checkBrokenLine(t *testing.T, h http.Handler, number int64, text, got []byte) string {
	t.Helper()
	var l batchLine
	if err := json.Unmarshal(got, &l); err != nil || l.Line != number || l.Problem == nil || l.Answer != nil {
		t.Fatalf("line %d: %v: %s", number, err, got)
	}
	if want := problemIn(t, classifyWith(t, h, "", text)); !sameProblem(t, *l.Problem, want) {
		t.Errorf("line %d: %+v, want %+v", number, l.Problem, want)
	}
	return l.Problem.Type
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

func unpacked(t testing.TB, r io.Reader) []byte {
	t.Helper()
	z, err := gzip.NewReader(r)
	if err != nil {
		t.Fatal(err)
	}
	data, err := io.ReadAll(z)
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// The four ways to pack the two directions give the same lines.
func TestBatchGzip(t *testing.T) {
	var text bytes.Buffer
	if _, err := io.Copy(&text, source(t).Reader(500)); err != nil {
		t.Fatal(err)
	}
	plain := bodyOf(t, callBatch(t, handler, "", text.String()))
	if n := bytes.Count(plain, []byte("\n")); n != 501 {
		t.Fatalf("%d lines", n)
	}
	// Two members in a row are one stream, as in files put together.
	half := bytes.IndexByte(text.Bytes()[text.Len()/2:], '\n') + text.Len()/2 + 1
	members := packed(t, text.String()[:half]) + packed(t, text.String()[half:])
	for _, body := range []string{packed(t, text.String()), members} {
		r := callBatch(t, handler, "", body, "Content-Encoding", "gzip")
		if r.Header.Get("Content-Encoding") != "" || !bytes.Equal(bodyOf(t, r), plain) {
			t.Error("packed in, plain out: another answer")
		}
		r = callBatch(t, handler, "", body, "Content-Encoding", "x-gzip", "Accept-Encoding", "br, gzip;q=0.5")
		if r.Header.Get("Content-Encoding") != "gzip" || !bytes.Equal(unpacked(t, r.Body), plain) {
			t.Error("packed both ways: another answer")
		}
	}
	r := callBatch(t, handler, "", text.String(), "Accept-Encoding", "gzip")
	if r.Header.Get("Vary") != "Accept-Encoding" || !bytes.Equal(unpacked(t, r.Body), plain) {
		t.Error("plain in, packed out: another answer")
	}
}

func TestAcceptsGzip(t *testing.T) {
	for header, want := range map[string]bool{
		"": false, "gzip": true, "GZIP": true, "x-gzip": true, "br": false, "deflate, gzip;q=1.0, *;q=0.5": true, "gzip;q=0": false,
		"gzip; q=0.000, *": false, "*": true, "*;q=0": false, "identity": false, "br,gzip ; q = 0.1": true, "gzip;q=x": true, "gzipped": false,
	} {
		if acceptsGzip([]string{header}) != want {
			t.Errorf("%q: %v", header, !want)
		}
	}
	if !acceptsGzip([]string{"br", "gzip"}) || acceptsGzip(nil) {
		t.Error("headers given apart")
	}
}

// A small body that unpacks to three hundred megabytes is answered in passing:
// nothing of it is kept.
func TestBatchOfABomb(t *testing.T) {
	var body bytes.Buffer
	w := gzip.NewWriter(&body)
	zeros := make([]byte, 1<<20)
	for range 300 {
		if _, err := w.Write(zeros); err != nil {
			t.Fatal(err)
		}
	}
	if _, err := w.Write([]byte("\n" + oneLine(riser) + "\n")); err != nil {
		t.Fatal(err)
	}
	if err := w.Close(); err != nil {
		t.Fatal(err)
	}
	var before, after runtime.MemStats
	runtime.ReadMemStats(&before)
	lines := batchLines(t, callBatch(t, handler, "?fields=kind", body.String(), "Content-Encoding", "gzip").Body)
	runtime.ReadMemStats(&after)
	if taken := after.TotalAlloc - before.TotalAlloc; taken > 30<<20 || body.Len() > 1<<20 {
		t.Errorf("a body of %d bytes took %d in all", body.Len(), taken)
	}
	if len(lines) != 3 || lines[0].Problem == nil || lines[0].Problem.Type != tooLarge.URI() || string(lines[1].Answer) != `{"kind":"cylinder"}` {
		t.Errorf("%+v", lines)
	}
}

func TestBatchRefusals(t *testing.T) {
	rows := []struct {
		name    string
		query   string
		body    string
		headers []string
		status  int
		problem *ProblemType
	}{
		{"JSON", "", riser, []string{"Content-Type", "application/json"}, 415, unsupportedMedia},
		{"no type", "", riser, []string{"Content-Type", ""}, 415, unsupportedMedia},
		{"latin", "", riser, []string{"Content-Type", "application/x-ndjson; charset=latin1"}, 415, unsupportedMedia},
		{"zip", "", riser, []string{"Content-Encoding", "zip"}, 415, unsupportedMedia},
		{"two codings", "", riser, []string{"Content-Encoding", "gzip, br"}, 415, unsupportedMedia},
		{"announced as gzip", "", riser, []string{"Content-Encoding", "gzip"}, 400, badRequest},
		{"gzip without a head", "", "", []string{"Content-Encoding", "gzip"}, 400, badRequest},
		{"unknown member", "?fields=recomendation", riser, nil, 422, invalidQuery},
		{"unknown parameter", "?field=kind", riser, nil, 422, invalidQuery},
		{"bad escape", "?fields=%zz", riser, nil, 400, badRequest},
	}
	for _, row := range rows {
		r := callBatch(t, handler, row.query, row.body, row.headers...)
		if p := problemIn(t, r); p.Status != row.status || p.Type != row.problem.URI() {
			t.Errorf("%s: %+v", row.name, p)
		}
	}
	if len(rows) != 10 {
		t.Errorf("%d rows", len(rows))
	}
	for _, media := range []string{"application/x-ndjson", "application/jsonl", "application/json-lines", "application/ndjson", "Application/X-NDJSON; charset=UTF-8"} {
		if r := callBatch(t, handler, "", "", "Content-Type", media); r.StatusCode != http.StatusOK {
			t.Errorf("%s: status %d", media, r.StatusCode)
		}
	}
	if r := callBatch(t, handler, "", "", "Content-Type", "text/plain"); !strings.Contains(r.Header.Get("Accept-Post"), typeLines) {
		t.Errorf("Accept-Post %q", r.Header.Get("Accept-Post"))
	}
}

// logged hands on the records of a log with one message.
type logged struct {
	slog.Handler
	message string
	records chan map[string]slog.Value
}

func newLogged(message string) *logged {
	return &logged{slog.DiscardHandler, message, make(chan map[string]slog.Value, 10)}
}

func (l *logged) Enabled(context.Context, slog.Level) bool { return true }

func (l *logged) Handle(_ context.Context, r slog.Record) error {
	if r.Message != l.message {
		return nil
	}
	attrs := map[string]slog.Value{}
	r.Attrs(func(a slog.Attr) bool { attrs[a.Key] = a.Value; return true })
	l.records <- attrs
	return nil
}

// stream is a batch over a real connection, sent bit by bit.
type stream struct {
	conn  net.Conn
	lines *bufio.Reader
	head  *http.Response
}

// openStream begins a batch and reads the head of the answer, before a line is sent.
func openStream(t testing.TB, address, query string) *stream {
	t.Helper()
	conn, err := net.Dial("tcp", address)
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() { conn.Close() })
	fmt.Fprintf(conn, "POST /v1/batch%s HTTP/1.1\r\nHost: x\r\nContent-Type: application/x-ndjson\r\nTransfer-Encoding: chunked\r\n\r\n", query)
	head, err := http.ReadResponse(bufio.NewReader(conn), nil)
	if err != nil {
		t.Fatal(err)
	}
	return &stream{conn, bufio.NewReader(head.Body), head}
}

func (s *stream) send(t testing.TB, text string) {
	t.Helper()
	if _, err := fmt.Fprintf(s.conn, "%x\r\n%s\r\n", len(text), text); err != nil {
		t.Fatal(err)
	}
}

func (s *stream) line(t testing.TB) string {
	t.Helper()
	line, err := s.lines.ReadString('\n')
	if err != nil {
		t.Fatalf("%q, %v", line, err)
	}
	return line
}

const kindOfRiser = `{"line":%d,"answer":{"kind":"cylinder"}}` + "\n"

// Both directions flow at once: each line is answered before the next is sent,
// for longer than the deadlines of an ordinary request.
func TestBatchFlowsBothWays(t *testing.T) {
	records := newLogged("batch")
	address, _, _ := run(t, Config{ReadTimeout: 500 * time.Millisecond, WriteTimeout: 500 * time.Millisecond, Logger: slog.New(records)})
	s := openStream(t, address, "?fields=kind")
	start := time.Now()
	n := 0
	for n < 10 || time.Since(start) < time.Second {
		n++
		s.send(t, oneLine(riser)+"\n")
		if got := s.line(t); got != fmt.Sprintf(kindOfRiser, n) {
			t.Fatalf("line %d: %s", n, got)
		}
	}
	fmt.Fprint(s.conn, "0\r\n\r\n")
	if got := s.line(t); got != fmt.Sprintf(`{"end":{"state":"complete","lines":%d,"answers":%d,"problems":0}}`+"\n", n, n) {
		t.Error(got)
	}
	if _, err := s.lines.ReadByte(); err != io.EOF || !s.head.Close {
		t.Errorf("behind the end: %v", err)
	}
	if r := <-records.records; r["state"].String() != "complete" || r["answers"].Int64() != int64(n) || r["request_id"].String() == "" {
		t.Errorf("log: %v", r)
	}
}

// A client who asks for leave before it sends the body gets it first.
func TestBatchExpectsLeave(t *testing.T) {
	address, _, _ := run(t, Config{})
	conn, err := net.Dial("tcp", address)
	if err != nil {
		t.Fatal(err)
	}
	defer conn.Close()
	body := oneLine(riser)
	fmt.Fprintf(conn, "POST /v1/batch?fields=kind HTTP/1.1\r\nHost: x\r\nContent-Type: application/x-ndjson\r\nExpect: 100-continue\r\nContent-Length: %d\r\n\r\n", len(body))
	from := bufio.NewReader(conn)
	leave, err := http.ReadResponse(from, nil)
	if err != nil || leave.StatusCode != http.StatusContinue {
		t.Fatal(leave, err)
	}
	fmt.Fprint(conn, body)
	answer, err := http.ReadResponse(from, nil)
	if err != nil {
		t.Fatal(err)
	}
	if lines := batchLines(t, answer.Body); len(lines) != 2 || lines[0].Answer == nil {
		t.Errorf("%+v", lines)
	}
}

// A client who stands still, with the stream open in both directions, is told so
// and cut off.
func TestBatchStandsStill(t *testing.T) {
	address, _, _ := run(t, Config{StreamIdleTimeout: time.Second})
	s := openStream(t, address, "?fields=kind")
	s.send(t, oneLine(riser)+"\n"+`{"structure"`)
	if got := s.line(t); got != fmt.Sprintf(kindOfRiser, 1) {
		t.Error(got)
	}
	if got := s.line(t); got != `{"end":{"state":"interrupted","lines":1,"answers":1,"problems":0}}`+"\n" {
		t.Error(got)
	}
	if _, err := s.conn.Read(make([]byte, 100)); err != nil && err != io.EOF {
		t.Error(err)
	}
}

// A client who sends and does not read is not read any further, and cut off
// after a while: what it can send is bounded by what lies in buffers.
func TestBatchHoldsBack(t *testing.T) {
	records := newLogged("batch")
	address, _, _ := run(t, Config{StreamIdleTimeout: time.Second, Logger: slog.New(records)})
	s := openStream(t, address, "")
	line := oneLine(riser) + "\n"
	text := strings.Repeat(line, 200)
	sent := 0
	for sent < 1<<30 {
		if _, err := fmt.Fprintf(s.conn, "%x\r\n%s\r\n", len(text), text); err != nil {
			break
		}
		sent += len(text)
	}
	if sent >= 1<<30 {
		t.Error("the server reads what it can't answer")
	}
	if r := <-records.records; r["state"].String() != "interrupted" || r["cause"].String() == "" {
		t.Errorf("log: %v", r)
	}
}

// A client who goes away ends the batch.
func TestBatchOfAClientWhoLeaves(t *testing.T) {
	records := newLogged("batch")
	address, _, _ := run(t, Config{Logger: slog.New(records)})
	for _, behind := range []string{"", "0\r\n\r\n"} {
		s := openStream(t, address, "?fields=kind")
		s.send(t, strings.Repeat(oneLine(riser)+"\n", 1))
		s.line(t)
		if behind != "" { // more than can be answered before it is gone
			s.send(t, strings.Repeat(oneLine(riser)+"\n", 20000))
		}
		fmt.Fprint(s.conn, behind)
		s.conn.Close()
		if r := <-records.records; r["state"].String() != "interrupted" || r["lines"].Int64() >= 20001 {
			t.Errorf("log: %v", r)
		}
	}
}

// A body that breaks off is answered as far as its lines are whole.
func TestBatchBreaksOff(t *testing.T) {
	address, _, _ := run(t, Config{})
	s := openStream(t, address, "?fields=kind")
	s.send(t, oneLine(riser)+"\n"+oneLine(riser))
	if got := s.line(t); got != fmt.Sprintf(kindOfRiser, 1) {
		t.Error(got)
	}
	if err := s.conn.(*net.TCPConn).CloseWrite(); err != nil {
		t.Fatal(err)
	}
	if got := s.line(t); got != `{"end":{"state":"interrupted","lines":1,"answers":1,"problems":0}}`+"\n" {
		t.Error(got)
	}
}

// A server that stops lets a batch end with a line that says how far it came,
// and takes no other.
func TestBatchOfAServerThatStops(t *testing.T) {
	address, stop, stopped := run(t, Config{ShutdownTimeout: 4 * time.Second})
	s := openStream(t, address, "?fields=kind")
	s.send(t, oneLine(riser)+"\n\n"+oneLine(riser)+"\n")
	for _, n := range []int{1, 3} {
		if got := s.line(t); got != fmt.Sprintf(kindOfRiser, n) {
			t.Error(got)
		}
	}
	stop()
	if got := s.line(t); got != `{"end":{"state":"interrupted","lines":3,"answers":2,"problems":0}}`+"\n" {
		t.Error(got)
	}
	if err := <-stopped; err != nil {
		t.Error(err)
	}
	ended := New(Config{})
	ended.endStreams()
	if p := problemIn(t, callBatch(t, ended.Handler(), "", riser)); p.Type != unavailable.URI() {
		t.Errorf("%+v", p)
	}
}

// A fault of the program on one line is a problem of that line, and stands in
// the log.
func TestBatchFault(t *testing.T) {
	var told string
	b := &batchAnswerer{BatchOptions{Fault: func(line int64, cause any, trace []byte) {
		told = fmt.Sprintf("%d %v %d", line, cause, min(len(trace), 1))
	}}, nil}
	text := []byte(`{"id":"x","case":` + oneLine(riser) + `}`)
	got, answered := b.answer(context.Background(), []byte(`{"line":7`), batch.Line{Number: 7, Text: text}) // without a schema
	var l batchLine
	if err := json.Unmarshal(append(got, '}'), &l); err != nil || answered || l.Problem == nil || l.Problem.Type != internal.URI() || string(l.ID) != `"x"` {
		t.Errorf("%v: %s", err, got)
	}
	if !strings.HasPrefix(told, "7 runtime error") || !strings.HasSuffix(told, " 1") {
		t.Errorf("told %q", told)
	}
}

// The examples of the contract are a batch and its answers, and every line of
// batches of all kinds holds against it.
func TestBatchHoldsAgainstTheContract(t *testing.T) {
	doc, _ := contract(t)
	op := doc.Paths.Value("/v1/batch").Post
	cases := op.RequestBody.Value.Content[typeLines].Examples["lines"].Value.Value.(string)
	want := op.Responses.Status(http.StatusOK).Value.Content[typeLines].Examples["lines"].Value.Value.(string)
	if got := bodyOf(t, callBatch(t, handler, "?fields=title,kind", cases)); string(got) != want {
		t.Errorf("the example answers %s, not %s", got, want)
	}
	strict := strictSchemas(t)
	var schemas []*jsonschema.Schema
	for _, name := range []string{"BatchLine", "BatchEnd"} {
		schema, err := strict.compiler.Compile(strictURL + "#/components/schemas/" + name)
		if err != nil {
			t.Fatal(err)
		}
		schemas = append(schemas, schema)
	}
	var text bytes.Buffer
	text.WriteString(cases)
	for _, row := range badCases {
		text.WriteString(oneLine(row.body) + "\n")
	}
	if _, err := io.Copy(&text, source(t).Reader(40)); err != nil {
		t.Fatal(err)
	}
	for _, query := range []string{"", "?what_if=true&samples=64"} {
		ran := 0
		for line := range strings.Lines(string(bodyOf(t, callBatch(t, handler, query, text.String())))) {
			value, err := jsonschema.UnmarshalJSON(strings.NewReader(line))
			if err != nil {
				t.Fatal(err)
			}
			which := 0
			if strings.HasPrefix(line, `{"end":`) {
				which = 1
			}
			if err := schemas[which].Validate(value); err != nil {
				t.Errorf("%v: %.300s", err, line)
			}
			ran++
		}
		if ran < 95 {
			t.Errorf("%d lines", ran)
		}
	}
}

// A batch answers without exploring unless it is asked to, and then as one case
// does.
func TestBatchExploresWhereAsked(t *testing.T) {
	uncertain := oneLine(string(caseIn(t, "../openapi/examples/uncertain.json")))
	for query, classify := range map[string]string{
		"":                                    "?what_if=false",
		"?what_if=true":                       "",
		"?samples=64&fields=uncertainty,kind": "?samples=64&fields=uncertainty,kind&what_if=false",
	} {
		for _, text := range []string{oneLine(riser), uncertain} {
			got := batchOf(t, handler, query, text)[0].Answer
			if want := bodyOf(t, call(t, http.MethodPost, "/v1/classify"+classify, text)); !bytes.Equal(got, want) {
				t.Errorf("%s: %.200s, want %.200s", query, got, want)
			}
		}
	}
	for _, query := range []string{"?samples=10", "?samples=many", "?what_if=perhaps"} {
		if p := problemIn(t, callBatch(t, handler, query, riser)); p.Type != invalidQuery.URI() || len(p.Violations) != 1 {
			t.Errorf("%s: %+v", query, p)
		}
	}
}
