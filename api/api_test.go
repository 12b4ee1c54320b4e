package api

import (
	"bytes"
	"io"
	"net/http"
	"net/http/httptest"
	"path/filepath"
	"strings"
	"sync"
	"testing"

	"github.com/go-json-experiment/json"
)

// riser is a case that holds in every test: a riser across a current.
const riser = `{
	"title": "Riser",
	"structure": {"kind": "cylinder", "diameter": "0.3 m", "length": "40 m", "mass_per_length": "180 kg/m",
		"support": "pinned-pinned", "frequency_dry": "1.2 Hz", "damping_ratio": "0.5 %"},
	"fluid": {"name": "seawater", "temperature": "10 degC"},
	"flow": {"speed": "1.1 m/s"},
	"motion": {"amplitude": "30 mm"}
}`

var handler = New(Config{Records: testRecords}).Handler()

// call sends a request to the handler and returns the answer.
func call(t testing.TB, method, path, body string, headers ...string) *http.Response {
	t.Helper()
	r := httptest.NewRequest(method, path, strings.NewReader(body))
	if method == http.MethodPost {
		r.Header.Set("Content-Type", "application/json")
	}
	for i := 0; i+1 < len(headers); i += 2 {
		r.Header.Set(headers[i], headers[i+1])
	}
	return serve(t, handler, r)
}

func serve(t testing.TB, h http.Handler, r *http.Request) *http.Response {
	t.Helper()
	w := httptest.NewRecorder()
	h.ServeHTTP(w, r)
	return w.Result()
}

func bodyOf(t testing.TB, r *http.Response) []byte {
	t.Helper()
	data, err := io.ReadAll(r.Body)
	if err != nil {
		t.Fatal(err)
	}
	return data
}

// problemIn reads the problem of an answer and checks what every problem has.
func problemIn(t testing.TB, r *http.Response) Problem {
	t.Helper()
	body := bodyOf(t, r)
	if got := r.Header.Get("Content-Type"); got != typeProblem {
		t.Fatalf("media type %q of %s", got, body)
	}
	var p Problem
	if err := json.Unmarshal(body, &p, json.RejectUnknownMembers(true)); err != nil {
		t.Fatalf("%v: %s", err, body)
	}
	if p.Status != r.StatusCode {
		t.Errorf("status %d in the body and %d on the line", p.Status, r.StatusCode)
	}
	if p.Title == "" || p.Detail == "" {
		t.Errorf("a problem without title or detail: %s", body)
	}
	if want := "urn:regimed:request:" + r.Header.Get("X-Request-ID"); p.Instance != want || len(want) < 22 {
		t.Errorf("instance %q, wanted %q", p.Instance, want)
	}
	for _, leak := range []string{"127.0.0.1", "::1", "192.0.2.1", ".go:", "goroutine", "*echo", "read tcp"} {
		if bytes.Contains(body, []byte(leak)) {
			t.Errorf("a problem that tells %q: %s", leak, body)
		}
	}
	return p
}

func TestClassifyAnswers(t *testing.T) {
	r := call(t, http.MethodPost, "/v1/classify", riser)
	body := bodyOf(t, r)
	if r.StatusCode != http.StatusOK {
		t.Fatalf("status %d: %s", r.StatusCode, body)
	}
	if got := r.Header.Get("Content-Type"); got != typeJSON {
		t.Errorf("media type %q", got)
	}
	if r.ContentLength != int64(len(body)) {
		t.Errorf("length %d announced, %d sent", r.ContentLength, len(body))
	}
	var answer struct {
		Digest         string
		Kind           string
		Findings       map[string]struct{ Verdict string }
		Recommendation struct{ Class string }
	}
	if err := json.Unmarshal(body, &answer, json.MatchCaseInsensitiveNames(true)); err != nil {
		t.Fatal(err)
	}
	if answer.Kind != "cylinder" || len(answer.Digest) != 64 || answer.Recommendation.Class == "" {
		t.Errorf("answer: %+v", answer)
	}
	if answer.Findings["one-way"].Verdict == "" {
		t.Error("no verdict on one-way")
	}
}

// The same case has the same answer, byte for byte, also when the buffers have
// served other requests between.
func TestAnswersAreTheSame(t *testing.T) {
	first := bodyOf(t, call(t, http.MethodPost, "/v1/classify", riser))
	for range 20 {
		bodyOf(t, call(t, http.MethodPost, "/v1/classify", `{"structure": {"kind": "cylinder", "diameter": "1 in"}}`))
		bodyOf(t, call(t, http.MethodPost, "/v1/classify", `{"structure": 1}`))
		if again := bodyOf(t, call(t, http.MethodPost, "/v1/classify", riser)); !bytes.Equal(first, again) {
			t.Fatalf("the answer changed:\n%s\n%s", first, again)
		}
	}
}

// Requests at the same time don't mix, though their buffers are shared.
func TestConcurrentAnswers(t *testing.T) {
	bodies := []string{riser, `{"structure": {"kind": "cylinder", "diameter": "1 in"}}`, `{"structure": {"kind": "cylinder", "diameter": "1 kg"}}`}
	var want []string
	for _, b := range bodies {
		want = append(want, string(bodyOf(t, call(t, http.MethodPost, "/v1/classify", b, "X-Request-ID", "same"))))
	}
	var all sync.WaitGroup
	for worker := range 6 {
		all.Go(func() {
			for i := range 30 {
				which := (worker + i) % len(bodies)
				r := httptest.NewRequest(http.MethodPost, "/v1/classify", strings.NewReader(bodies[which]))
				r.Header.Set("Content-Type", "application/json")
				r.Header.Set("X-Request-ID", "same")
				w := httptest.NewRecorder()
				handler.ServeHTTP(w, r)
				if got := w.Body.String(); got != want[which] {
					t.Errorf("another answer: %.300s", got)
				}
			}
		})
	}
	all.Wait()
}

// OPTIONS says which methods a path answers.
func TestOptions(t *testing.T) {
	for path, method := range map[string]string{"/v1/classify": "POST", "/v1/catalog": "GET"} {
		r := call(t, http.MethodOptions, path, "")
		if r.StatusCode != http.StatusNoContent || !strings.Contains(r.Header.Get("Allow"), method) {
			t.Errorf("%s: status %d, Allow %q", path, r.StatusCode, r.Header.Get("Allow"))
		}
	}
}

func TestFieldsTrimTheAnswer(t *testing.T) {
	body := bodyOf(t, call(t, http.MethodPost, "/v1/classify?fields=recommendation,findings", riser))
	var members map[string]any
	if err := json.Unmarshal(body, &members); err != nil {
		t.Fatal(err)
	}
	if len(members) != 2 || members["recommendation"] == nil || members["findings"] == nil {
		t.Errorf("members: %v", len(members))
	}
}

func TestContentTypes(t *testing.T) {
	accepted := []string{"application/json", "application/json; charset=utf-8", "application/json;charset=UTF-8", "Application/JSON", `application/json; charset="utf-8"`}
	for _, media := range accepted {
		if r := call(t, http.MethodPost, "/v1/classify", riser, "Content-Type", media); r.StatusCode != http.StatusOK {
			t.Errorf("%q: status %d", media, r.StatusCode)
		}
	}
	refused := []string{"", "text/plain", "application/xml", "application/yaml", "application/json; charset=latin1", "application/json; profile=x",
		"application/problem+json", "application/x-www-form-urlencoded", "multipart/form-data", "application/json, text/plain", ";;"}
	for _, media := range refused {
		r := call(t, http.MethodPost, "/v1/classify", riser, "Content-Type", media)
		if r.StatusCode != http.StatusUnsupportedMediaType || r.Header.Get("Accept-Post") != "application/json" {
			t.Errorf("%q: status %d, Accept-Post %q", media, r.StatusCode, r.Header.Get("Accept-Post"))
		}
		problemIn(t, r)
	}
	if len(accepted)+len(refused) != 16 {
		t.Errorf("%d rows", len(accepted)+len(refused))
	}
}

// Every case that is shipped is answered.
func TestShippedCases(t *testing.T) {
	ran := 0
	for _, file := range shippedCases(t) {
		r := call(t, http.MethodPost, "/v1/classify", string(caseIn(t, file)))
		if r.StatusCode != http.StatusOK {
			t.Errorf("%s: status %d: %s", file, r.StatusCode, bodyOf(t, r))
		}
		ran++
	}
	if ran < 3 {
		t.Errorf("%d cases", ran)
	}
}

// shippedCases are the example cases of the contract, and those of testdata.
func shippedCases(t testing.TB) []string {
	t.Helper()
	var files []string
	for _, pattern := range []string{"../openapi/examples/*.json", "../testdata/cases/*.json"} {
		list, err := filepath.Glob(pattern)
		if err != nil {
			t.Fatal(err)
		}
		files = append(files, list...)
	}
	return files
}

func TestFixedAnswers(t *testing.T) {
	rows := []struct{ path, mediaType, contains string }{
		{"/v1/catalog", typeJSON, `"kinds"`},
		{"/v1/catalog/kinds", typeJSON, `"cylinder"`},
		{"/v1/catalog/groups", typeJSON, `"reynolds"`},
		{"/v1/catalog/assumptions", typeJSON, `"one-way"`},
		{"/v1/catalog/classes", typeJSON, `"added-mass"`},
		{"/v1/catalog/criteria", typeJSON, `"standard"`},
		{"/v1/catalog/fluids", typeJSON, `"seawater"`},
		{"/v1/catalog/solids", typeJSON, `"steel"`},
		{"/v1/catalog/units", typeJSON, `"slinch"`},
		{"/v1/catalog/sources", typeJSON, `"from_memory"`},
		{"/v1/catalog/canon", typeJSON, `"OscillatingCylinder"`},
		{"/v1/schema/case", typeSchema, `"$defs"`},
		{"/problems", typeJSON, `/problems/invalid-case`},
		{"/problems/invalid-case", typeJSON, `"wrong-dimension"`},
		{"/healthz", typeJSON, `"ok"`},
		{"/readyz", typeJSON, `"ready"`},
		{"/version", typeJSON, `"catalogue"`},
		{"/openapi.yaml", typeYAML, "openapi: 3.1.0"},
		{"/openapi.json", typeJSON, `"openapi": "3.1.0"`},
	}
	for _, row := range rows {
		r := call(t, http.MethodGet, row.path, "")
		body := bodyOf(t, r)
		if r.StatusCode != http.StatusOK || r.Header.Get("Content-Type") != row.mediaType || !bytes.Contains(body, []byte(row.contains)) {
			t.Errorf("%s: status %d, %s: %.200s", row.path, r.StatusCode, r.Header.Get("Content-Type"), body)
		}
		head := call(t, http.MethodHead, row.path, "")
		if n := len(bodyOf(t, head)); n != 0 || head.StatusCode != http.StatusOK || head.ContentLength != int64(len(body)) {
			t.Errorf("HEAD %s: status %d, length %d, body of %d", row.path, head.StatusCode, head.ContentLength, n)
		}
		if row.path[0:3] == "/v1" {
			if r := call(t, http.MethodGet, row.path+"?verbose=1", ""); r.StatusCode != http.StatusUnprocessableEntity {
				t.Errorf("%s takes a parameter that it does not know: %d", row.path, r.StatusCode)
			}
		}
	}
	if len(rows) != 19 {
		t.Errorf("%d rows", len(rows))
	}
}

// The type of each problem can be fetched, and says the same.
func TestProblemTypesResolve(t *testing.T) {
	seen := map[string]bool{}
	for _, p := range problemTypes {
		if seen[p.ID] {
			t.Errorf("%s twice", p.ID)
		}
		seen[p.ID] = true
		r := call(t, http.MethodGet, p.URI(), "")
		var record problemRecord
		if err := json.Unmarshal(bodyOf(t, r), &record); err != nil {
			t.Fatal(err)
		}
		if record.Type != p.URI() || record.Status != p.Status || record.Description == "" || (len(record.Codes) > 0) != p.Codes {
			t.Errorf("%s: %+v", p.ID, record)
		}
	}
	if len(seen) != 21 {
		t.Errorf("%d types", len(seen))
	}
}
