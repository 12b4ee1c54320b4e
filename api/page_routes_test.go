package api

import (
	"net/http"
	"regexp"
	"slices"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api/page"
)

// Every file of the page goes out with headers that let it load nothing of
// others, and only from this service.
func TestPageHeaders(t *testing.T) {
	paths := []string{"/", "/examples.json"}
	for name := range page.Files() {
		paths = append(paths, "/sheet/"+name)
	}
	for _, path := range paths {
		r := call(t, http.MethodGet, path, "")
		body := bodyOf(t, r)
		if r.StatusCode != http.StatusOK || len(body) == 0 || r.ContentLength != int64(len(body)) {
			t.Errorf("%s: status %d, %d bytes, %d announced", path, r.StatusCode, len(body), r.ContentLength)
		}
		for name, want := range map[string]string{
			"Content-Security-Policy": page.Policy, "X-Content-Type-Options": "nosniff", "X-Frame-Options": "DENY",
			"Referrer-Policy": "no-referrer", "Cross-Origin-Opener-Policy": "same-origin", "Cross-Origin-Resource-Policy": "same-origin", "Cache-Control": "no-cache",
		} {
			if got := r.Header.Get(name); got != want {
				t.Errorf("%s: %s is %q", path, name, got)
			}
		}
		again := call(t, http.MethodGet, path, "", "If-None-Match", r.Header.Get("ETag"))
		if again.StatusCode != http.StatusNotModified || len(bodyOf(t, again)) != 0 || again.Header.Get("ETag") != r.Header.Get("ETag") {
			t.Errorf("%s: status %d the second time", path, again.StatusCode)
		}
		if head := call(t, http.MethodHead, path, ""); head.StatusCode != http.StatusOK || head.ContentLength != int64(len(body)) {
			t.Errorf("HEAD %s: status %d, length %d", path, head.StatusCode, head.ContentLength)
		}
	}
	if len(paths) < 15 {
		t.Errorf("%d files", len(paths))
	}
}

// The policy allows nothing written into the page, and nothing from elsewhere.
func TestPagePolicy(t *testing.T) {
	policy := map[string]string{}
	for part := range strings.SplitSeq(page.Policy, "; ") {
		name, value, _ := strings.Cut(part, " ")
		policy[name] = value
	}
	for name, want := range map[string]string{"default-src": "'none'", "script-src": "'self'", "style-src": "'self'", "img-src": "'self' data:",
		"connect-src": "'self'", "base-uri": "'none'", "form-action": "'none'", "frame-ancestors": "'none'"} {
		if policy[name] != want {
			t.Errorf("%s %s", name, policy[name])
		}
	}
	if strings.Contains(page.Policy, "unsafe") || strings.Contains(page.Policy, "http") {
		t.Error(page.Policy)
	}
}

// The page is for those who take HTML.
func TestPageIsHTML(t *testing.T) {
	rows := []struct {
		accept []string
		status int
	}{
		{nil, 200},
		{[]string{"*/*"}, 200},
		{[]string{"text/html"}, 200},
		{[]string{"text/*"}, 200},
		{[]string{"text/html,application/xhtml+xml,application/xml;q=0.9,*/*;q=0.8"}, 200},
		{[]string{"application/json", "text/html;q=0.1"}, 200},
		{[]string{"application/json"}, 406},
		{[]string{"application/json, text/html;q=0"}, 406},
		{[]string{"text/html;q=0, */*"}, 406},
		{[]string{"text/html;q=0, text/*"}, 406},
		{[]string{"text/*;q=0, */*"}, 406},
		{[]string{"image/*"}, 406},
		{[]string{";;"}, 200},
	}
	for _, row := range rows {
		var headers []string
		for _, a := range row.accept {
			headers = append(headers, "Accept", a)
		}
		r := callWith(t, "/", headers)
		if r.StatusCode != row.status || !slices.Contains(r.Header.Values("Vary"), "Accept") {
			t.Errorf("%q: status %d, Vary %q", row.accept, r.StatusCode, r.Header.Values("Vary"))
		}
		if row.status == http.StatusNotAcceptable {
			if p := problemIn(t, r); p.Type != "/problems/not-acceptable" {
				t.Errorf("%q: %s", row.accept, p.Type)
			}
		}
	}
	if len(rows) != 13 {
		t.Errorf("%d rows", len(rows))
	}
}

// callWith asks for a path with headers, of which one may come twice.
func callWith(t *testing.T, path string, headers []string) *http.Response {
	t.Helper()
	r, err := http.NewRequest(http.MethodGet, path, nil)
	if err != nil {
		t.Fatal(err)
	}
	for i := 0; i+1 < len(headers); i += 2 {
		r.Header.Add(headers[i], headers[i+1])
	}
	return serve(t, handler, r)
}

// A tag that is one of several, weak, or any, still holds.
func TestPageTags(t *testing.T) {
	tag := page.Index().Tag
	for sent, status := range map[string]int{
		tag: 304, "W/" + tag: 304, `"other", ` + tag: 304, "*": 304, `"other"`: 200, strings.Trim(tag, `"`): 200,
	} {
		if r := call(t, http.MethodGet, "/", "", "If-None-Match", sent); r.StatusCode != status {
			t.Errorf("%s: status %d", sent, r.StatusCode)
		}
	}
}

func TestPageFileUnknown(t *testing.T) {
	for _, name := range []string{"nothing.js", "..%2fpage.go", "index.htm", ""} {
		if r := call(t, http.MethodGet, "/sheet/"+name, ""); r.StatusCode != http.StatusNotFound {
			t.Errorf("%q: status %d", name, r.StatusCode)
		}
	}
}

// Every address on the page is one that the service answers.
func TestPageLinks(t *testing.T) {
	found := regexp.MustCompile(`(?:href|src)="(/[^"]*)"`).FindAllSubmatch(page.Index().Body, -1)
	for _, m := range found {
		if r := call(t, http.MethodGet, string(m[1]), ""); r.StatusCode != http.StatusOK {
			t.Errorf("%s: status %d", m[1], r.StatusCode)
		}
	}
	if len(found) < 7 {
		t.Errorf("%d addresses", len(found))
	}
}

// Every demo case that the page offers is one that the service answers.
func TestDemoCasesAnswer(t *testing.T) {
	var list struct {
		Examples []struct {
			Name string         `json:"name"`
			Case jsontext.Value `json:"case"`
		} `json:"examples"`
	}
	if err := json.Unmarshal(bodyOf(t, call(t, http.MethodGet, "/examples.json", "")), &list); err != nil {
		t.Fatal(err)
	}
	for _, e := range list.Examples {
		if r := call(t, http.MethodPost, "/v1/classify?fields=kind", string(e.Case)); r.StatusCode != http.StatusOK {
			t.Errorf("%s: %s", e.Name, bodyOf(t, r))
		}
	}
	if len(list.Examples) < 45 {
		t.Errorf("%d cases", len(list.Examples))
	}
}
