package api

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"net/http"
	"net/http/httptest"
	"net/url"
	"os"
	"slices"
	"strconv"
	"strings"
	"sync"
	"testing"
	"time"

	"github.com/getkin/kin-openapi/openapi3"
	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api/render"
	"regimed/api/store"
	"regimed/regime/whatif"
)

// testRecords are those of the handler that all tests share.
var testRecords, testFolder = temporaryRecords()

func temporaryRecords() (store.Store, string) {
	dir, err := os.MkdirTemp("", "regimed-api")
	if err != nil {
		panic(err)
	}
	records, err := store.OpenSQLite(context.Background(), dir)
	if err != nil {
		panic(err)
	}
	return records, dir
}

func TestMain(m *testing.M) {
	status := m.Run()
	if err := errors.Join(testRecords.Close(), os.RemoveAll(testFolder)); err != nil {
		fmt.Fprintln(os.Stderr, err)
		status = 1
	}
	os.Exit(status)
}

// prepareRecord makes the record that an example of the contract asks for.
func prepareRecord(t *testing.T, r *http.Request) {
	t.Helper()
	path := r.URL.Path
	if at, err := url.Parse(r.URL.Query().Get("url")); path == "/oembed" && err == nil {
		path = at.Path
	}
	if id, found := strings.CutPrefix(path, "/embed/"); found {
		path = "/v1/records/" + id
	}
	if !strings.HasPrefix(path, "/v1/records/") {
		return
	}
	kase, err := os.ReadFile("../openapi/examples/marine-riser.json")
	if err != nil {
		t.Fatal(err)
	}
	made := call(t, http.MethodPost, "/v1/records", `{"case": `+string(kase)+`}`)
	if at := made.Header.Get("Location"); !strings.HasPrefix(path, at) {
		t.Fatalf("the example asks for %s, and its case has %s", r.URL.Path, at)
	}
}

var nineOClock = time.Date(2026, 7, 30, 9, 0, 0, 0, time.UTC)

// keeper is a server with records of its own and a clock that goes on by a
// minute a record.
type keeper struct {
	*Server
	records store.Store
}

func newKeeper(t testing.TB) *keeper {
	t.Helper()
	records, err := store.OpenSQLite(context.Background(), t.TempDir())
	if err != nil {
		t.Fatal(err)
	}
	t.Cleanup(func() {
		if err := records.Close(); err != nil {
			t.Error(err)
		}
	})
	var mutex sync.Mutex
	now := nineOClock
	return &keeper{New(Config{Records: records, Clock: func() time.Time {
		mutex.Lock()
		defer mutex.Unlock()
		now = now.Add(time.Minute)
		return now
	}}), records}
}

func (k *keeper) ask(t testing.TB, method, path, body string, headers ...string) *http.Response {
	t.Helper()
	r := httptest.NewRequest(method, path, strings.NewReader(body))
	if method == http.MethodPost {
		r.Header.Set("Content-Type", "application/json")
	}
	for i := 0; i+1 < len(headers); i += 2 {
		r.Header.Set(headers[i], headers[i+1])
	}
	return serve(t, k.Handler(), r)
}

// post makes a record and returns its path and the body that came back.
func (k *keeper) post(t testing.TB, body string) (path string, sent []byte) {
	t.Helper()
	r := k.ask(t, http.MethodPost, "/v1/records", body)
	sent = bodyOf(t, r)
	if r.StatusCode != http.StatusCreated {
		t.Fatalf("status %d: %s", r.StatusCode, sent)
	}
	return r.Header.Get("Location"), sent
}

// sentRecord is a record as a client reads it.
type sentRecord struct {
	recordHead
	Case      jsontext.Value `json:"case"`
	Canonical jsontext.Value `json:"canonical"`
	Answer    jsontext.Value `json:"answer"`
	Current   *struct {
		Engine EngineRecord   `json:"engine"`
		Answer jsontext.Value `json:"answer"`
	} `json:"current"`
	Changed *Change `json:"changed"`
}

func readRecord(t testing.TB, body []byte) *sentRecord {
	t.Helper()
	var r sentRecord
	if err := json.Unmarshal(body, &r, json.RejectUnknownMembers(true)); err != nil {
		t.Fatalf("%v: %.300s", err, body)
	}
	return &r
}

func asking(kase, rest string) string { return `{"case": ` + kase + rest + `}` }

// What is posted comes back, with the answer that classify gives, byte for byte.
func TestRecordIsMade(t *testing.T) {
	k := newKeeper(t)
	made := k.ask(t, http.MethodPost, "/v1/records", asking(riser, `, "title": "Riser B", "tags": ["riser", "b"], "author": "M. Vane"`))
	body := bodyOf(t, made)
	answer := bodyOf(t, k.ask(t, http.MethodPost, "/v1/classify", riser))
	r := readRecord(t, body)
	if made.StatusCode != http.StatusCreated || made.Header.Get("Location") != "/v1/records/"+r.ID || made.Header.Get("Etag") == "" {
		t.Errorf("status %d, headers %v", made.StatusCode, made.Header)
	}
	var of struct {
		Digest         string
		Recommendation struct{ Class string }
	}
	if err := json.Unmarshal(answer, &of, json.MatchCaseInsensitiveNames(true)); err != nil {
		t.Fatal(err)
	}
	if r.ID != of.Digest || r.Class != of.Recommendation.Class || r.Kind != "cylinder" || r.Title != "Riser B" || r.Author != "M. Vane" ||
		!slices.Equal(r.Tags, []string{"riser", "b"}) || r.Created != "2026-07-30T09:01:00.000000Z" || r.Engine != (EngineRecord{render.Version, render.Catalogue()}) {
		t.Errorf("record %+v", r.recordHead)
	}
	if !bytes.Contains(body, []byte(`"case":`+riser+`,`)) {
		t.Error("the case is not as it was sent")
	}
	if got := bodyOf(t, k.ask(t, http.MethodGet, "/v1/records/"+r.ID+".json", "")); !bytes.Equal(got, answer) {
		t.Errorf("got  %.200s\nwant %.200s", got, answer)
	}
	if got := bodyOf(t, k.ask(t, http.MethodGet, "/v1/records/"+r.ID, "")); !bytes.Equal(got, body) {
		t.Error("the record is not what was answered when it was made")
	}
	text := k.ask(t, http.MethodGet, "/v1/records/"+r.ID+".txt", "")
	if got := string(bodyOf(t, text)); !strings.HasPrefix(got, "Recommended") || text.Header.Get("Content-Type") != typeText {
		t.Errorf("%s: %.100s", text.Header.Get("Content-Type"), got)
	}
}

// The title of the case is that of its record where none is given.
func TestTitleOfTheCase(t *testing.T) {
	k := newKeeper(t)
	_, body := k.post(t, asking(riser, ""))
	if r := readRecord(t, body); r.Title != "Riser" || r.Author != "" || len(r.Tags) != 0 {
		t.Errorf("%+v", r.recordHead)
	}
	_, body = k.post(t, asking(cylinderWith(""), ""))
	if r := readRecord(t, body); r.Title != "" {
		t.Errorf("%+v", r.recordHead)
	}
}

// The same case, however it is written, has one record: the first.
func TestSameCaseSameRecord(t *testing.T) {
	k := newKeeper(t)
	path, first := k.post(t, asking(riser, `, "title": "First", "tags": ["a"]`))
	other := strings.NewReplacer(`"0.3 m"`, `"300 mm"`, `"1.1 m/s"`, `{"value": 1.1, "unit": "m/s"}`).Replace(riser)
	again := k.ask(t, http.MethodPost, "/v1/records", asking(other, `, "title": "Second", "tags": ["b"], "author": "X"`))
	body := bodyOf(t, again)
	if again.StatusCode != http.StatusOK || again.Header.Get("Location") != path || !bytes.Equal(body, first) {
		t.Errorf("status %d, %s: %.200s", again.StatusCode, again.Header.Get("Location"), body)
	}
}

// Of those who post the same case at once, one makes the record.
func TestSameCaseAtOnce(t *testing.T) {
	k := newKeeper(t)
	for round := range 10 {
		var all sync.WaitGroup
		statuses, bodies := make([]int, 12), make([][]byte, 12)
		for i := range statuses {
			all.Go(func() {
				r := k.ask(t, http.MethodPost, "/v1/records", asking(cylinderWith(`, "length": "`+strconv.Itoa(10+round)+` m"`), `, "author": "`+strconv.Itoa(i)+`"`))
				statuses[i], bodies[i] = r.StatusCode, bodyOf(t, r)
			})
		}
		all.Wait()
		slices.Sort(statuses)
		if statuses[10] != http.StatusOK || statuses[0] != http.StatusOK || statuses[11] != http.StatusCreated {
			t.Errorf("statuses %v", statuses)
		}
		for _, b := range bodies {
			if !bytes.Equal(b, bodies[0]) {
				t.Errorf("two records: %.200s and %.200s", b, bodies[0])
			}
		}
	}
}

// Everything that is wrong with a request is said at once, and where.
func TestBadRecords(t *testing.T) {
	long := strings.Repeat("x", 201)
	many := strings.TrimSuffix(strings.Repeat(`"t", `, 21), ", ")
	good := cylinderWith("")
	rows := []struct {
		name, body string
		want       []string
	}{
		{"nothing", `{}`, []string{"/case missing"}},
		{"a list", `[]`, []string{" wrong-type"}},
		{"null", `null`, []string{" wrong-type"}},
		{"a case alone", good, []string{"/case missing", "/fluid unknown-field", "/structure unknown-field"}},
		{"a case that is none", `{"case": "cylinder"}`, []string{"/case wrong-type"}},
		{"wrong case", asking(`{"structure": {"kind": "cylinder", "diameter": "0.3 kg"}, "fluid": "watr"}`, ""),
			[]string{"/case/fluid unknown-choice", "/case/structure/diameter wrong-dimension"}},
		{"a case that can't be resolved", asking(cylinderWith(`, "radius": "0.2 m"`), ""), []string{"/case/structure/radius contradiction"}},
		{"unknown member", asking(good, `, "titel": "x"`), []string{"/titel unknown-field"}},
		{"signs of a pointer", asking(good, `, "a/b~c": "x"`), []string{"/a~1b~0c unknown-field"}},
		{"case twice", `{"case": ` + good + `, "case": ` + good + `}`, []string{"/case duplicate"}},
		{"title twice", asking(good, `, "title": "a", "title": "b"`), []string{"/title duplicate"}},
		{"title that is no text", asking(good, `, "title": 3`), []string{"/title wrong-type"}},
		{"no title", asking(good, `, "title": null`), []string{"/title wrong-type"}},
		{"empty title", asking(good, `, "title": "  "`), []string{"/title out-of-range"}},
		{"long title", asking(good, `, "title": "`+long+`"`), []string{"/title out-of-range"}},
		{"title of two lines", asking(good, `, "title": "a\nb"`), []string{"/title out-of-range"}},
		{"NUL", asking(good, `, "author": "a\u0000b"`), []string{"/author out-of-range"}},
		{"tags that are no list", asking(good, `, "tags": "a"`), []string{"/tags wrong-type"}},
		{"bad tags", asking(good, `, "tags": ["a", "", "a", 4, "`+long+`"]`),
			[]string{"/tags/1 out-of-range", "/tags/2 duplicate", "/tags/3 wrong-type", "/tags/4 out-of-range"}},
		{"too many tags", asking(good, `, "tags": [`+strings.Replace(many, `"t"`, `"u"`, 1)+`]`), nil},
		{"all at once", `{"case": {"structure": {"kind": "cylinder", "diameter": -1}}, "title": 1, "tags": [null], "author": "", "more": 0}`,
			[]string{"/author out-of-range", "/case/structure/diameter missing-unit", "/more unknown-field", "/tags/0 wrong-type", "/title wrong-type"}},
	}
	k := newKeeper(t)
	for _, row := range rows {
		t.Run(row.name, func(t *testing.T) {
			r := k.ask(t, http.MethodPost, "/v1/records", row.body)
			p := problemIn(t, r)
			if r.StatusCode != http.StatusUnprocessableEntity || p.Type != "/problems/invalid-record" {
				t.Fatalf("status %d, %s: %s", r.StatusCode, p.Type, p.Detail)
			}
			checkViolations(t, p)
			if got := found(p); row.want != nil && !slices.Equal(got, row.want) {
				t.Errorf("found  %q\nwanted %q", got, row.want)
			}
		})
	}
	if len(rows) != 21 {
		t.Errorf("%d rows", len(rows))
	}
	if page, err := k.records.List(context.Background(), store.Query{Limit: 10}); err != nil || len(page.Records) != 0 {
		t.Errorf("%v: something was kept: %v", err, page)
	}
}

func TestMalformedRecords(t *testing.T) {
	k := newKeeper(t)
	rows := []string{"", "{", `{"case": {}`, `{"case": {}} {}`, `{"case": {}}]`, `{case: 1}`, "{\"case\": \"\xff\"}", `{"case": 01}`, `{"title": "\ud800"}`}
	for _, body := range rows {
		p := problemIn(t, k.ask(t, http.MethodPost, "/v1/records", body))
		if p.Status != http.StatusBadRequest || p.Type != "/problems/malformed-json" || p.Offset == nil {
			t.Errorf("%q: %+v", body, p)
		}
	}
	if len(rows) != 9 {
		t.Errorf("%d rows", len(rows))
	}
}

// Requests that name no record, each with its problem.
func TestRecordProblems(t *testing.T) {
	k := newKeeper(t)
	path, _ := k.post(t, asking(riser, ""))
	nobody := "/v1/records/" + strings.Repeat("0", 64)
	rows := []struct {
		method, path string
		status       int
		problem      string
	}{
		{"GET", nobody, 404, "not-found"},
		{"GET", nobody + ".txt", 404, "not-found"},
		{"GET", nobody + "?engine=current", 404, "not-found"},
		{"GET", nobody[:len("/v1/records/")+12], 404, "not-found"},
		{"GET", path[:len("/v1/records/")+11], 404, "not-found"},
		{"GET", path + "0", 404, "not-found"},
		{"GET", strings.ToUpper(path), 404, "not-found"},
		{"GET", "/v1/records/..", 404, "not-found"},
		{"GET", "/v1/records/%2e%2e%2f%2e%2e", 404, "not-found"},
		{"GET", path + ".doc", 404, "not-found"},
		{"GET", path + ".", 404, "not-found"},
		{"GET", path + ".txt.json", 404, "not-found"},
		{"GET", path + "?engine=old", 422, "invalid-query"},
		{"GET", path + "?engine=", 422, "invalid-query"},
		{"GET", path + "?motor=current", 422, "invalid-query"},
		{"GET", path + "?%zz", 400, "bad-request"},
		{"DELETE", nobody, 404, "not-found"},
		{"DELETE", path[:len("/v1/records/")+40], 404, "not-found"},
		{"DELETE", path + ".json", 404, "not-found"},
		{"DELETE", path + "?really=yes", 422, "invalid-query"},
		{"DELETE", "/v1/records", 405, "method-not-allowed"},
		{"PUT", path, 405, "method-not-allowed"},
		{"POST", "/v1/records?title=x", 422, "invalid-query"},
	}
	for _, row := range rows {
		p := problemIn(t, k.ask(t, row.method, row.path, asking(riser, "")))
		if p.Status != row.status || p.Type != "/problems/"+row.problem {
			t.Errorf("%s %s: %d %s: %s", row.method, row.path, p.Status, p.Type, p.Detail)
		}
	}
	if len(rows) != 23 {
		t.Errorf("%d rows", len(rows))
	}
	if p := problemIn(t, k.ask(t, "GET", path+".tx", "")); !strings.Contains(p.Detail, "Did you mean .txt?") {
		t.Errorf("%s", p.Detail)
	}
	if r := k.ask(t, "GET", path, ""); r.StatusCode != http.StatusOK {
		t.Errorf("the record: %d", r.StatusCode)
	}
}

// Bad lists say what is wrong with each parameter.
func TestBadLists(t *testing.T) {
	k := newKeeper(t)
	rows := []struct {
		query string
		want  []string
	}{
		{"kind=cylindre", []string{"/kind unknown-choice"}},
		{"class=one-way-implicit", []string{"/class unknown-choice"}},
		{"tag=", []string{"/tag out-of-range"}},
		{"tag=a%0Ab", []string{"/tag out-of-range"}},
		{"text=" + strings.Repeat("x", 201), []string{"/text out-of-range"}},
		{"text=%ff%00", []string{"/text out-of-range"}},
		{"from=yesterday", []string{"/from syntax"}},
		{"from=1969-12-31", []string{"/from syntax"}},
		{"to=2026-02-30", []string{"/to syntax"}},
		{"from=2026-07-30&to=2026-07-30", []string{"/to contradiction"}},
		{"limit=0", []string{"/limit out-of-range"}},
		{"limit=201", []string{"/limit out-of-range"}},
		{"limit=ten", []string{"/limit wrong-type"}},
		{"cursor=x", []string{"/cursor syntax"}},
		{"limit=1&limit=2", []string{"/limit duplicate"}},
		{"kinds=plate", []string{"/kinds unknown-field"}},
		{"kind=x&class=y&tag=&from=z&limit=-1&cursor=&colour=red",
			[]string{"/class unknown-choice", "/colour unknown-field", "/cursor syntax", "/from syntax", "/kind unknown-choice", "/limit out-of-range", "/tag out-of-range"}},
	}
	for _, row := range rows {
		p := problemIn(t, k.ask(t, http.MethodGet, "/v1/records?"+row.query, ""))
		if got := found(p); p.Status != 422 || p.Type != "/problems/invalid-query" || !slices.Equal(got, row.want) {
			t.Errorf("%s: %s %q, wanted %q", row.query, p.Type, got, row.want)
		}
		checkViolations(t, p)
	}
	if len(rows) != 17 {
		t.Errorf("%d rows", len(rows))
	}
}

// A list is read page by page, filtered, the newest first.
func TestListOfRecords(t *testing.T) {
	k := newKeeper(t)
	var ids []string
	for i := range 7 {
		path, _ := k.post(t, asking(cylinderWith(`, "length": "`+strconv.Itoa(10+i)+` m"`), fmt.Sprintf(`, "title": "Pile %d", "tags": ["t%d"]`, i, i%2)))
		ids = append(ids, strings.TrimPrefix(path, "/v1/records/"))
	}
	slices.Reverse(ids) // the newest first
	var seen []string
	query := url.Values{"limit": {"3"}}
	for pages := 1; ; pages++ {
		list := listOf(t, k, query)
		for _, r := range list.Records {
			seen = append(seen, r.ID)
		}
		if list.Next == "" {
			if pages != 3 {
				t.Errorf("%d pages", pages)
			}
			break
		}
		query.Set("cursor", list.Next)
		k.post(t, asking(cylinderWith(`, "length": "`+strconv.Itoa(100+pages)+` m"`), ""))
	}
	if !slices.Equal(seen, ids) {
		t.Errorf("seen   %q\nwanted %q", seen, ids)
	}
	rows := []struct {
		query string
		want  int
	}{
		{"", 9}, {"kind=plate", 0}, {"kind=cylinder&tag=t1", 3}, {"text=pIlE%204", 1}, {"from=2026-07-30T09:08:00Z", 2},
		{"to=2026-07-30T11:08:00%2B02:00", 7}, {"from=2026-07-31", 0}, {"from=2026-07-30&to=2026-07-31", 9},
	}
	for _, row := range rows {
		values, err := url.ParseQuery(row.query)
		if err != nil {
			t.Fatal(err)
		}
		if got := listOf(t, k, values); len(got.Records) != row.want || got.Next != "" {
			t.Errorf("%s: %d records, next %q", row.query, len(got.Records), got.Next)
		}
	}
	if len(rows) != 8 {
		t.Errorf("%d rows", len(rows))
	}
}

func listOf(t *testing.T, k *keeper, query url.Values) *recordList {
	t.Helper()
	r := k.ask(t, http.MethodGet, "/v1/records?"+query.Encode(), "")
	var list recordList
	if err := json.Unmarshal(bodyOf(t, r), &list); err != nil || r.StatusCode != http.StatusOK {
		t.Fatalf("%s: %d, %v", query.Encode(), r.StatusCode, err)
	}
	return &list
}

// The first digits of an id find its record, and name the candidates where
// they are those of several.
func TestFirstDigits(t *testing.T) {
	k := newKeeper(t)
	path, body := k.post(t, asking(riser, ""))
	short := k.ask(t, http.MethodGet, path[:len("/v1/records/")+12], "")
	if got := bodyOf(t, short); !bytes.Equal(got, body) || short.Header.Get("Cache-Control") != "no-cache" || short.Header.Get("Content-Location") != path {
		t.Errorf("%v: %.100s", short.Header, got)
	}
	if r := k.ask(t, http.MethodGet, path[:len("/v1/records/")+20]+".txt", ""); r.Header.Get("Content-Location") != path+".txt" || r.StatusCode != http.StatusOK {
		t.Errorf("%d, %v", r.StatusCode, r.Header)
	}
	for i := range 12 {
		r := stored(t, "0123456789ab"+fmt.Sprintf("%052x", i))
		if _, _, err := k.records.Put(context.Background(), r); err != nil {
			t.Fatal(err)
		}
	}
	p := problemIn(t, k.ask(t, http.MethodGet, "/v1/records/0123456789ab", ""))
	if p.Status != http.StatusNotFound || p.Type != "/problems/ambiguous-record" || len(p.Candidates) != 10 || !strings.Contains(p.Detail, "10 and more") {
		t.Errorf("%+v", p)
	}
	p = problemIn(t, k.ask(t, http.MethodGet, "/v1/records/0123456789ab"+strings.Repeat("0", 51), ""))
	if len(p.Candidates) != 10 || p.Candidates[0] != "0123456789ab"+strings.Repeat("0", 52) {
		t.Errorf("%+v", p)
	}
	if r := k.ask(t, http.MethodGet, "/v1/records/"+p.Candidates[3], ""); r.StatusCode != http.StatusOK {
		t.Errorf("a candidate: %d", r.StatusCode)
	}
}

// stored is a record as another engine may have kept it.
func stored(t testing.TB, id string) *store.Record {
	t.Helper()
	sub, violations, err := ReadSubmission([]byte(asking(riser, "")), New(Config{}).schema)
	if err != nil || len(violations) > 0 {
		t.Fatal(err, violations)
	}
	answer := bodyOf(t, call(t, http.MethodPost, "/v1/classify", riser))
	return &store.Record{
		Head: store.Head{ID: id, Created: nineOClock, Kind: "cylinder", Class: "two-way-implicit", Engine: engineInForce(),
			Options: appendOptions(nil, whatif.Options{Explore: true})},
		Case: sub.Sent, Canonical: sub.Case.Canonical(nil), Answer: answer,
	}
}

// A strong tag, 304 for who has it, and no longer than it holds.
func TestTagsAndCaches(t *testing.T) {
	k := newKeeper(t)
	path, _ := k.post(t, asking(riser, ""))
	rows := []struct {
		path, cache string
	}{
		{path, cacheForever},
		{path + ".json", cacheForever},
		{path + ".txt", cacheForever},
		{path + ".html", cacheAsking}, // who may frame it may change
		{path[:len(path)-1], "no-cache"},
		{path[:len(path)-1] + ".txt", "no-cache"},
		{path + "?engine=current", "no-cache"},
		{path + ".txt?engine=current", "no-cache"},
		{path + ".json?engine=current", "no-cache"},
		{"/v1/records", "no-cache"},
		{"/v1/records?limit=1", "no-cache"},
	}
	for _, row := range rows {
		r := k.ask(t, http.MethodGet, row.path, "")
		body, tag := bodyOf(t, r), r.Header.Get("Etag")
		if r.StatusCode != http.StatusOK || tag != tagOf(body) || r.Header.Get("Cache-Control") != row.cache {
			t.Errorf("%s: %d, %v", row.path, r.StatusCode, r.Header)
		}
		for _, mine := range []string{tag, `"other", ` + tag, "W/" + tag, "*"} {
			again := k.ask(t, http.MethodGet, row.path, "", "If-None-Match", mine)
			if again.StatusCode != http.StatusNotModified || len(bodyOf(t, again)) != 0 || again.Header.Get("Etag") != tag || again.Header.Get("Cache-Control") != row.cache {
				t.Errorf("%s with %s: %d, %v", row.path, mine, again.StatusCode, again.Header)
			}
		}
		if again := k.ask(t, http.MethodGet, row.path, "", "If-None-Match", `"other"`); again.StatusCode != http.StatusOK {
			t.Errorf("%s with another tag: %d", row.path, again.StatusCode)
		}
		head := k.ask(t, http.MethodHead, row.path, "")
		if head.StatusCode != http.StatusOK || len(bodyOf(t, head)) != 0 || head.Header.Get("Etag") != tag || head.Header.Get("Content-Length") != strconv.Itoa(len(body)) {
			t.Errorf("HEAD %s: %d, %v", row.path, head.StatusCode, head.Header)
		}
	}
	if len(rows) != 11 {
		t.Errorf("%d rows", len(rows))
	}
	tag := k.ask(t, http.MethodGet, "/v1/records", "").Header.Get("Etag")
	k.post(t, asking(cylinderWith(""), ""))
	if again := k.ask(t, http.MethodGet, "/v1/records", "", "If-None-Match", tag); again.StatusCode != http.StatusOK {
		t.Errorf("a list that has grown: %d", again.StatusCode)
	}
}

func TestDeleteRecord(t *testing.T) {
	k := newKeeper(t)
	path, _ := k.post(t, asking(riser, ""))
	r := k.ask(t, http.MethodDelete, path, "")
	if body := bodyOf(t, r); r.StatusCode != http.StatusNoContent || len(body) != 0 {
		t.Errorf("%d: %s", r.StatusCode, body)
	}
	for _, method := range []string{http.MethodGet, http.MethodDelete} {
		if r := k.ask(t, method, path, ""); r.StatusCode != http.StatusNotFound {
			t.Errorf("%s afterwards: %d", method, r.StatusCode)
		}
	}
	_, body := k.post(t, asking(riser, `, "title": "Anew"`))
	if r := readRecord(t, body); r.Title != "Anew" || r.Created != "2026-07-30T09:02:00.000000Z" {
		t.Errorf("%+v", r.recordHead)
	}
}

// Who may not write may read.
func TestMayWrite(t *testing.T) {
	k := newKeeper(t)
	path, _ := k.post(t, asking(riser, ""))
	guarded := &keeper{New(Config{Records: k.records, MayWrite: func(r *http.Request) error {
		if r.Header.Get("X-Guest") != "" {
			return problem(notFound, "Guests find nothing to write here.")
		}
		return nil
	}}), k.records}
	for _, method := range []string{http.MethodPost, http.MethodDelete} {
		at := map[string]string{http.MethodPost: "/v1/records", http.MethodDelete: path}[method]
		if r := guarded.ask(t, method, at, asking(cylinderWith(""), ""), "X-Guest", "yes"); r.StatusCode != http.StatusNotFound {
			t.Errorf("%s as a guest: %d", method, r.StatusCode)
		}
	}
	if r := guarded.ask(t, http.MethodGet, path, "", "X-Guest", "yes"); r.StatusCode != http.StatusOK {
		t.Errorf("reading: %d", r.StatusCode)
	}
	if r := guarded.ask(t, http.MethodDelete, path, ""); r.StatusCode != http.StatusNoContent {
		t.Errorf("deleting: %d", r.StatusCode)
	}
}

// Without records their paths say how to switch them on, and the rest goes on.
func TestRecordsOff(t *testing.T) {
	off := &keeper{New(Config{}), nil}
	id := "/v1/records/" + strings.Repeat("0", 64)
	rows := []struct{ method, path string }{{"POST", "/v1/records"}, {"GET", "/v1/records"}, {"GET", id}, {"GET", id + ".txt"}, {"DELETE", id}}
	for _, row := range rows {
		p := problemIn(t, off.ask(t, row.method, row.path, asking(riser, "")))
		if p.Status != http.StatusNotFound || p.Type != "/problems/records-off" || !strings.Contains(p.Detail, "--data") {
			t.Errorf("%s %s: %+v", row.method, row.path, p)
		}
	}
	if len(rows) != 5 {
		t.Errorf("%d rows", len(rows))
	}
	if r := off.ask(t, http.MethodPost, "/v1/classify", riser); r.StatusCode != http.StatusOK {
		t.Errorf("classify: %d", r.StatusCode)
	}
}

// brokenStore fails for a reason.
type brokenStore struct{ reason store.Reason }

func (b brokenStore) err() error {
	return &store.Error{Op: "get", Reason: b.reason, Cause: errors.New("open /srv/secret/records.db: out of order")}
}
func (b brokenStore) Put(context.Context, *store.Record) (*store.Record, bool, error) {
	return nil, false, b.err()
}
func (b brokenStore) Get(context.Context, string) (*store.Record, error) { return nil, b.err() }
func (b brokenStore) Match(context.Context, string, int) ([]string, error) {
	return nil, b.err()
}
func (b brokenStore) List(context.Context, store.Query) (store.Page, error) {
	return store.Page{}, b.err()
}
func (b brokenStore) Delete(context.Context, string) error { return b.err() }
func (b brokenStore) Close() error                         { return nil }

// A store that fails is a problem of its own kind, with no word of where it
// lies; classification goes on.
func TestBrokenStore(t *testing.T) {
	closed := newKeeper(t)
	if err := closed.records.Close(); err != nil {
		t.Fatal(err)
	}
	id := "/v1/records/" + strings.Repeat("0", 64)
	rows := []struct {
		records store.Store
		status  int
		problem string
		retry   string
	}{
		{brokenStore{store.Unavailable}, 503, "records-unavailable", "2"},
		{brokenStore{store.ReadOnly}, 503, "records-unavailable", "60"},
		{brokenStore{store.Full}, 507, "records-full", ""},
		{brokenStore{store.Damaged}, 500, "records-damaged", ""},
		{closed.records, 503, "records-unavailable", "2"},
	}
	for _, row := range rows {
		k := &keeper{New(Config{Records: row.records}), row.records}
		for _, ask := range []struct{ method, path string }{{"POST", "/v1/records"}, {"GET", "/v1/records"}, {"GET", id}, {"GET", id[:40]}, {"DELETE", id}} {
			r := k.ask(t, ask.method, ask.path, asking(riser, ""))
			retry := r.Header.Get("Retry-After")
			p := problemIn(t, r)
			if p.Status != row.status || p.Type != "/problems/"+row.problem || retry != row.retry || strings.Contains(p.Detail, "secret") {
				t.Errorf("%s %s: %+v, retry %q", ask.method, ask.path, p, retry)
			}
		}
		if r := k.ask(t, http.MethodPost, "/v1/classify", riser); r.StatusCode != http.StatusOK {
			t.Errorf("classify: %d", r.StatusCode)
		}
		if r := k.ask(t, http.MethodGet, "/readyz", ""); r.StatusCode != http.StatusOK {
			t.Errorf("/readyz: %d", r.StatusCode)
		}
	}
	if len(rows) != 5 {
		t.Errorf("%d rows", len(rows))
	}
}

// otherEngine answered before this one.
var otherEngine = store.Engine{Version: "0.0.7", Catalogue: strings.Repeat("0d", 32)}

// elsewhere is a record that another engine answered, with changes in its answer.
func elsewhere(t *testing.T, k *keeper, changes ...string) string {
	t.Helper()
	r := stored(t, "")
	r.ID = readDigest(t, r.Answer)
	r.Engine = otherEngine
	old := []string{render.Version + `","catalogue":"` + render.Catalogue(), otherEngine.Version + `","catalogue":"` + otherEngine.Catalogue}
	answer := string(r.Answer)
	for i, pairs := 0, append(old, changes...); i+1 < len(pairs); i += 2 {
		if strings.Count(answer, pairs[i]) < 1 {
			t.Fatalf("the answer has no %s: %s", pairs[i], answer)
		}
		answer = strings.Replace(answer, pairs[i], pairs[i+1], 1)
	}
	r.Answer = []byte(answer)
	if _, isNew, err := k.records.Put(context.Background(), r); err != nil || !isNew {
		t.Fatal(isNew, err)
	}
	return "/v1/records/" + r.ID
}

func readDigest(t *testing.T, answer []byte) string {
	t.Helper()
	var a struct {
		Digest string `json:"digest"`
	}
	if err := json.Unmarshal(answer, &a); err != nil {
		t.Fatal(err)
	}
	return a.Digest
}

// A record of another engine whose answer is still the same: what is drawn says
// who drew it, the record itself is as it was.
func TestRecordOfAnotherEngine(t *testing.T) {
	k := newKeeper(t)
	path := elsewhere(t, k)
	today := render.Version + " " + render.Catalogue()
	text := k.ask(t, http.MethodGet, path+".txt", "")
	body := string(bodyOf(t, text))
	for _, want := range []string{"Answered by regimed 0.0.7 (catalogue 0d0d0d0d0d0d) on 2026-07-30", "drawn by regimed", "answer is the same."} {
		if !strings.Contains(strings.Join(strings.Fields(body), " "), want) {
			t.Errorf("it does not say %q: %.400s", want, body)
		}
	}
	if h := text.Header; h.Get("Regimed-Drawn-By") != today || h.Get("Regimed-Engine") != otherEngine.Version+" "+otherEngine.Catalogue || h.Get("Cache-Control") != "no-cache" {
		t.Errorf("headers %v", h)
	}
	data := k.ask(t, http.MethodGet, path+".json", "")
	if got := string(bodyOf(t, data)); !strings.Contains(got, otherEngine.Catalogue) || data.Header.Get("Cache-Control") != cacheForever || data.Header.Get("Regimed-Drawn-By") != "" {
		t.Errorf("headers %v: %.200s", data.Header, got)
	}
	r := readRecord(t, bodyOf(t, k.ask(t, http.MethodGet, path+"?engine=current", "")))
	if c := r.Changed; c.Answer || c.Class != nil || len(c.Verdicts)+len(c.Groups) != 0 || r.Current.Engine.Version != render.Version {
		t.Errorf("changed %+v", c)
	}
	if r.Engine.Version != otherEngine.Version || !strings.Contains(string(r.Answer), otherEngine.Catalogue) || !strings.Contains(string(r.Current.Answer), render.Catalogue()) {
		t.Errorf("engines %+v, %+v", r.Engine, r.Current.Engine)
	}
	current := bodyOf(t, k.ask(t, http.MethodGet, path+".json?engine=current", ""))
	if want := bodyOf(t, k.ask(t, http.MethodPost, "/v1/classify", riser)); !bytes.Equal(current, want) {
		t.Error("today's answer is not what classify gives")
	}
}

// A record whose answer was another: what changed is said, in data and in what
// is drawn.
func TestAnswerOfAnotherEngine(t *testing.T) {
	k := newKeeper(t)
	answer := string(bodyOf(t, k.ask(t, http.MethodPost, "/v1/classify", riser)))
	var a struct {
		Recommendation struct{ Class string }
		Findings       map[string]struct{ Verdict string }
		Groups         map[string]struct{ Value *float64 }
	}
	if err := json.Unmarshal([]byte(answer), &a, json.MatchCaseInsensitiveNames(true)); err != nil {
		t.Fatal(err)
	}
	now, verdict, reynolds := a.Recommendation.Class, a.Findings["one-way"].Verdict, *a.Groups["reynolds"].Value
	_, rest, _ := strings.Cut(answer, `"one-way":`)
	judged, _, _ := strings.Cut(rest, `"verdict":`)
	head := `"one-way":` + judged + `"verdict":`
	value := `"value":` + strconv.FormatFloat(reynolds, 'f', -1, 64)
	path := elsewhere(t, k,
		`"class":"`+now+`","title"`, `"class":"dry-structure","title"`,
		head+`"`+verdict+`"`, head+`"unheard"`,
		value, `"value":`+strconv.FormatFloat(2*reynolds, 'f', -1, 64),
	)
	r := readRecord(t, bodyOf(t, k.ask(t, http.MethodGet, path+"?engine=current", "")))
	c := r.Changed
	if !c.Answer || c.Class == nil || *c.Class.Before != "dry-structure" || *c.Class.After != now {
		t.Errorf("changed %+v", c)
	}
	if v := c.Verdicts["one-way"]; len(c.Verdicts) != 1 || v.Before == nil || *v.Before != "unheard" || *v.After != verdict {
		t.Errorf("verdicts %v", c.Verdicts)
	}
	if g := c.Groups["reynolds"]; len(c.Groups) != 1 || g.Before == nil || *g.Before != 2*reynolds || *g.After != reynolds {
		t.Errorf("groups %v", c.Groups)
	}
	text := strings.Join(strings.Fields(string(bodyOf(t, k.ask(t, http.MethodGet, path+".txt", "")))), " ")
	if want := "whose answer differs: class dry-structure then, " + now + " now; 1 verdict; 1 group. The answer as it was: " + path + ".json"; !strings.Contains(text, want) {
		t.Errorf("it does not say %q: %.500s", want, text)
	}
	if got := bodyOf(t, k.ask(t, http.MethodGet, path+".json", "")); !bytes.Contains(got, []byte(`"unheard"`)) {
		t.Error("the answer is not as it was")
	}
}

// The last digits of a group, a finding that was not there, and a word of prose.
func TestChanges(t *testing.T) {
	x, y, z := 1.0, 1+1e-12, 1+1e-6
	type values = map[string]struct {
		Value *float64 `json:"value"`
	}
	type verdicts = map[string]struct {
		Verdict string `json:"verdict"`
	}
	was := &summary{Groups: values{"a": {&x}, "b": {&x}, "c": {nil}, "d": {&x}, "f": {nil}}, Findings: verdicts{"p": {"valid"}, "q": {"valid"}}}
	is := &summary{Groups: values{"a": {&y}, "b": {&z}, "c": {nil}, "d": {nil}, "e": {&x}, "f": {&x}}, Findings: verdicts{"p": {"valid"}, "r": {"marginal"}}}
	c := changeOf(was, is)
	for _, id := range []string{"b", "d", "e", "f"} {
		if _, ok := c.Groups[id]; !ok {
			t.Errorf("%s is missing", id)
		}
	}
	if len(c.Groups) != 4 || len(c.Verdicts) != 2 || c.Verdicts["q"].After != nil || c.Verdicts["r"].Before != nil || c.Class != nil {
		t.Errorf("%+v", c)
	}
	if got := c.words(); got != "2 verdicts; 4 groups" {
		t.Errorf("%q", got)
	}
	if got := changeOf(was, was).words(); got != "in no class, verdict or group, but elsewhere" {
		t.Errorf("%q", got)
	}
}

// A case that today's engine refuses can't be drawn or judged; its record is as
// it was.
func TestOutdatedCase(t *testing.T) {
	k := newKeeper(t)
	r := stored(t, strings.Repeat("ab", 32))
	r.Case = bytes.Replace(r.Case, []byte(`"pinned-pinned"`), []byte(`"hinged"`), 1)
	if _, _, err := k.records.Put(context.Background(), r); err != nil {
		t.Fatal(err)
	}
	path := "/v1/records/" + r.ID
	for _, suffix := range []string{".txt", "?engine=current", ".json?engine=current"} {
		p := problemIn(t, k.ask(t, http.MethodGet, path+suffix, ""))
		if p.Status != http.StatusConflict || p.Type != "/problems/outdated-case" || !slices.Equal(found(p), []string{"/case/structure/support unknown-choice"}) {
			t.Errorf("%s: %+v", suffix, p)
		}
	}
	for _, suffix := range []string{"", ".json"} {
		if r := k.ask(t, http.MethodGet, path+suffix, ""); r.StatusCode != http.StatusOK {
			t.Errorf("%q: %d", suffix, r.StatusCode)
		}
	}
}

// Answers of the paths of records hold against the contract, and say nothing
// that it does not document.
func TestRecordsHoldAgainstTheContract(t *testing.T) {
	doc, router := contract(t)
	strict := strictSchemas(t)
	made := call(t, http.MethodPost, "/v1/records", asking(riser, `, "tags": ["contract"]`))
	path := made.Header.Get("Location")
	rows := []struct {
		method, path, body string
		status             int
	}{
		{"POST", "/v1/records", asking(cylinderWith(`, "length": "17 m"`), `, "author": "Contract"`), 201},
		{"POST", "/v1/records", asking(cylinderWith(`, "length": "17 m"`), ""), 200},
		{"POST", "/v1/records", asking(cylinderWith(`, "length": "17"`), `, "tags": [1]`), 422},
		{"POST", "/v1/records", "{", 400},
		{"POST", "/v1/records", strings.Repeat(" ", 2<<20), 413},
		{"GET", "/v1/records", "", 200},
		{"GET", "/v1/records?limit=1&tag=contract", "", 200},
		{"GET", "/v1/records?limit=x", "", 422},
		{"GET", path, "", 200},
		{"GET", path[:40], "", 200},
		{"GET", path + ".json", "", 200},
		{"GET", path + ".txt", "", 200},
		{"GET", path + "?engine=current", "", 200},
		{"GET", path + ".json?engine=current", "", 200},
		{"GET", path + ".txt?engine=current", "", 200},
		{"GET", path + "?engine=new", "", 422},
		{"GET", path[:len(path)-1] + "g", "", 404},
		{"DELETE", path, "", 204},
		{"DELETE", path, "", 404},
		{"GET", path, "", 404},
	}
	for _, row := range rows {
		r := httptest.NewRequest(row.method, "http://127.0.0.1:8610"+row.path, strings.NewReader(row.body))
		if row.method == http.MethodPost {
			r.Header.Set("Content-Type", "application/json")
		}
		route, _, err := router.FindRoute(r)
		if err != nil {
			t.Fatalf("%s: %v", row.path, err)
		}
		answer := checkAgainst(t, router, r)
		if answer.StatusCode != row.status {
			t.Errorf("%s %s: %d", row.method, row.path, answer.StatusCode)
		}
		strict.check(t, doc.Paths.Value(route.Path).GetOperation(row.method), answer)
	}
	if len(rows) != 20 {
		t.Errorf("%d rows", len(rows))
	}
}

// Each form of an answer is in the contract: in the pattern of the path, and
// with its media type.
func TestFormatsAreInTheContract(t *testing.T) {
	doc, _ := contract(t)
	op := doc.Paths.Value("/v1/records/{id}").Get
	pattern := op.Parameters.GetByInAndName(openapi3.ParameterInPath, "id").Schema.Value.Pattern
	if want := `^[0-9a-f]{12,64}(\.(` + strings.Join(FormatNames(), "|") + `))?$`; pattern != want {
		t.Errorf("the pattern is %s, and should be %s", pattern, want)
	}
	for i := range answerFormats {
		media, _, _ := strings.Cut(answerFormats[i].mediaType, ";")
		if op.Responses.Status(http.StatusOK).Value.Content[media] == nil {
			t.Errorf("%s is not documented", media)
		}
	}
}
