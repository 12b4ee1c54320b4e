package api

import (
	"bytes"
	"encoding/xml"
	"fmt"
	"net/http"
	"net/url"
	"os"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"

	"regimed/api/store"
)

const wikiOrigin = "https://wiki.example"

// embedding is a server with a record, whose pages may be framed by a list.
func embedding(t *testing.T, c Config, body string) (k *keeper, id string) {
	t.Helper()
	k = newKeeper(t)
	c.Records = k.records
	path, _ := k.post(t, body)
	k.Server = New(c)
	return k, strings.TrimPrefix(path, "/v1/records/")
}

func shippedRecord(t *testing.T, name, rest string) string {
	t.Helper()
	kase, err := os.ReadFile("../testdata/cases/" + name + ".json")
	if err != nil {
		t.Fatal(err)
	}
	return `{"case": ` + string(kase) + rest + `}`
}

func TestEmbeddedPage(t *testing.T) {
	k, id := embedding(t, Config{FrameAncestors: []string{wikiOrigin}}, shippedRecord(t, "sluice-skin", `, "title": "Skin <plate> & \"sea\"", "author": "M. Vane"`))
	for _, row := range []struct{ query, theme, scheme string }{
		{"", "auto", "light dark"}, {"?theme=dark", "dark", "dark"}, {"?theme=light&view=findings", "light", "light"}, {"?view=summary", "auto", "light dark"},
	} {
		r := k.ask(t, http.MethodGet, "/embed/"+id+row.query, "")
		page := string(bodyOf(t, r))
		if r.StatusCode != http.StatusOK || r.Header.Get("Content-Type") != typeHTML {
			t.Fatalf("%s: status %d", row.query, r.StatusCode)
		}
		for _, want := range []string{`data-theme="` + row.theme + `"`, `content="` + row.scheme + `"`, "Skin &lt;plate&gt; &amp; &#34;sea&#34;", "<code>added-mass</code>",
			"No cavitation", "valid", `href="/v1/records/` + id, "2026-07-30, recorded by M. Vane", "verifies no design"} {
			if !strings.Contains(page, want) {
				t.Errorf("%s: no %s in %s", row.query, want, page)
			}
		}
		// Only the view of all shows what ruled the cheaper class out.
		if all := strings.Contains(row.query, "findings"); strings.Contains(page, `class="invalid"`) != all {
			t.Errorf("%s: invalid findings %t", row.query, !all)
		}
		if strings.Contains(page, "<script") || strings.Contains(page, "style=") || len(page) > 30<<10 {
			t.Errorf("%s: %d bytes", row.query, len(page))
		}
		policy := r.Header.Get("Content-Security-Policy")
		if !strings.HasPrefix(policy, "default-src 'none'; ") || !strings.HasSuffix(policy, "; frame-ancestors "+wikiOrigin) || strings.Contains(policy, "unsafe") {
			t.Errorf("policy %s", policy)
		}
		if r.Header.Get("X-Frame-Options") != "" || r.Header.Get("Cross-Origin-Resource-Policy") != "cross-origin" {
			t.Errorf("headers %v", r.Header)
		}
		again := k.ask(t, http.MethodGet, "/embed/"+id+row.query, "", "If-None-Match", r.Header.Get("ETag"))
		if again.StatusCode != http.StatusNotModified || again.Header.Get("Content-Security-Policy") != policy {
			t.Errorf("%s: status %d the second time", row.query, again.StatusCode)
		}
	}
	if short := k.ask(t, http.MethodGet, "/embed/"+id[:store.PrefixDigits], ""); short.StatusCode != http.StatusOK {
		t.Errorf("by its first digits: %d", short.StatusCode)
	}
}

// Unless the operator says otherwise, nobody frames a page.
func TestEmbeddingIsOff(t *testing.T) {
	k, id := embedding(t, Config{}, `{"case": `+riser+`}`)
	r := k.ask(t, http.MethodGet, "/embed/"+id, "")
	if policy := r.Header.Get("Content-Security-Policy"); !strings.HasSuffix(policy, "frame-ancestors 'none'") || r.Header.Get("X-Frame-Options") != "DENY" || r.Header.Get("Cross-Origin-Resource-Policy") != "" {
		t.Errorf("headers %v", r.Header)
	}
	for _, form := range FormatNames() {
		r := k.ask(t, http.MethodGet, "/v1/records/"+id+"."+form, "")
		if policy := r.Header.Get("Content-Security-Policy"); r.StatusCode != http.StatusOK || !strings.HasSuffix(policy, "; frame-ancestors 'none'") {
			t.Errorf(".%s: %d, policy %s", form, r.StatusCode, policy)
		}
		isPicture := strings.HasPrefix(r.Header.Get("Content-Type"), "image/")
		if shared := r.Header.Get("Cross-Origin-Resource-Policy") == "cross-origin"; shared != isPicture {
			t.Errorf(".%s: shared %t", form, shared)
		}
	}
}

// Whatever the case, the page shows no word that is not its own, and is HTML
// whose elements close.
func TestEmbeddedPages(t *testing.T) {
	k := newKeeper(t)
	ran := 0
	for _, file := range shippedCases(t) {
		path, _ := k.post(t, `{"case": `+string(caseIn(t, file))+`}`)
		id := strings.TrimPrefix(path, "/v1/records/")
		for _, query := range []string{"", "?view=findings"} {
			r := k.ask(t, http.MethodGet, "/embed/"+id+query, "")
			page := string(bodyOf(t, r))
			if r.StatusCode != http.StatusOK || strings.Contains(page, "NaN") || strings.Contains(page, "<no value>") || strings.Contains(page, "ZgotmplZ") {
				t.Errorf("%s%s: %d: %s", file, query, r.StatusCode, page)
			}
			dec := xml.NewDecoder(strings.NewReader(strings.NewReplacer(`<meta charset="utf-8">`, "").Replace(page)))
			dec.Strict, dec.AutoClose, dec.Entity = false, xml.HTMLAutoClose, xml.HTMLEntity
			if err := decodeAll(dec); err != nil {
				t.Errorf("%s%s: %v", file, query, err)
			}
			ran++
		}
	}
	if ran < 90 {
		t.Errorf("%d pages", ran)
	}
}

func decodeAll(dec *xml.Decoder) error {
	for {
		token, err := dec.Token()
		if token == nil {
			if err != nil && err.Error() == "EOF" {
				return nil
			}
			return err
		}
	}
}

func TestEmbeddedStrip(t *testing.T) {
	k, id := embedding(t, Config{}, `{"case": `+riser+`}`)
	r := k.ask(t, http.MethodGet, "/embed/"+id+".svg", "")
	body := bodyOf(t, r)
	if r.StatusCode != http.StatusOK || r.Header.Get("Content-Type") != typeSVG || r.Header.Get("Cross-Origin-Resource-Policy") != "cross-origin" || r.Header.Get("Regimed-Drawn-By") == "" {
		t.Errorf("%d: %v", r.StatusCode, r.Header)
	}
	root, _, err := rootOfSVG(body)
	if err != nil {
		t.Fatal(err)
	}
	if w, h := sizeOfSVG(root.Attr); w != 640 || h != 64 {
		t.Errorf("%g by %g, and the README says 640 by 64", w, h)
	}
	if !bytes.Contains(body, []byte(id[:store.PrefixDigits])) {
		t.Errorf("%s", body)
	}
}

func TestEmbeddingRefuses(t *testing.T) {
	k, id := embedding(t, Config{}, `{"case": `+riser+`}`)
	rows := []struct {
		path    string
		status  int
		problem string
	}{
		{"/embed/" + id + "?theme=blue", 422, "invalid-query"},
		{"/embed/" + id + "?veiw=findings", 422, "invalid-query"},
		{"/embed/" + id + "?view=", 422, "invalid-query"},
		{"/embed/" + id + ".svg?theme=dark", 422, "invalid-query"},
		{"/embed/" + id + ".png", 404, "not-found"},
		{"/embed/" + id + ".", 404, "not-found"},
		{"/embed/abc", 404, "not-found"},
		{"/embed/" + strings.Repeat("0", 64), 404, "not-found"},
	}
	for _, row := range rows {
		r := k.ask(t, http.MethodGet, row.path, "")
		if p := problemIn(t, r); r.StatusCode != row.status || p.Type != "/problems/"+row.problem {
			t.Errorf("%s: %d %s", row.path, r.StatusCode, p.Type)
		}
	}
	if len(rows) != 8 {
		t.Errorf("%d rows", len(rows))
	}
	for _, path := range []string{"/embed/" + id, "/oembed?url=http://example.com/v1/records/" + id} {
		if p := problemIn(t, serve(t, New(Config{}).Handler(), newGet(t, path))); p.Type != "/problems/records-off" {
			t.Errorf("%s: %s", path, p.Type)
		}
	}
}

func newGet(t *testing.T, path string) *http.Request {
	t.Helper()
	r, err := http.NewRequest(http.MethodGet, path, nil)
	if err != nil {
		t.Fatal(err)
	}
	return r
}

func TestFrameAncestors(t *testing.T) {
	rows := []struct {
		list []string
		want string // empty: refused
	}{
		{nil, "'none'"}, {[]string{"none"}, "'none'"}, {[]string{"'none'"}, "'none'"}, {[]string{"*"}, "*"},
		{[]string{"self", " https://wiki.example "}, "'self' https://wiki.example"},
		{[]string{"http://127.0.0.1:8080"}, "http://127.0.0.1:8080"}, {[]string{"https://*.example:*"}, "https://*.example:*"},
		{[]string{"none", "self"}, ""}, {[]string{""}, ""}, {[]string{"wiki.example"}, ""}, {[]string{"https://wiki.example/page"}, ""},
		{[]string{"https://a.example; script-src *"}, ""}, {[]string{"https://a.example\r\nX: y"}, ""}, {[]string{"'unsafe-inline'"}, ""}, {[]string{"https:"}, ""},
	}
	for _, row := range rows {
		got, err := FrameAncestors(row.list)
		if got != row.want || (err == nil) != (row.want != "") {
			t.Errorf("%q: %q, %v", row.list, got, err)
		}
		if s := New(Config{FrameAncestors: row.list}); row.want == "" && s.ancestors != nobody {
			t.Errorf("%q opens %s", row.list, s.ancestors)
		}
	}
	if len(rows) != 15 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestPublicURL(t *testing.T) {
	rows := []struct{ text, want string }{
		{"https://regimed.example", "https://regimed.example"}, {"https://regimed.example/", "https://regimed.example"},
		{"http://127.0.0.1:8610/tools/regimed/", "http://127.0.0.1:8610/tools/regimed"}, {"http://[::1]:8610", "http://[::1]:8610"},
		{"regimed.example", ""}, {"ftp://regimed.example", ""}, {"https://a@regimed.example", ""}, {"https://regimed.example?a", ""},
		{"https://regimed.example#a", ""}, {"https://", ""}, {"https://a b", ""}, {"https://\"><script>", ""},
	}
	for _, row := range rows {
		got, err := PublicURL(row.text)
		if got != row.want || (err == nil) != (row.want != "") {
			t.Errorf("%q: %q, %v", row.text, got, err)
		}
	}
	if len(rows) != 12 {
		t.Errorf("%d rows", len(rows))
	}
	if got, err := PublicURL(""); got != "" || err != nil {
		t.Errorf("%q, %v", got, err)
	}
}

// askOembed asks how an address is shown.
func (k *keeper) askOembed(t *testing.T, address, more string) *http.Response {
	t.Helper()
	return k.ask(t, http.MethodGet, "http://regimed.example/oembed?url="+url.QueryEscape(address)+more, "")
}

func TestOembed(t *testing.T) {
	body := `{"case": ` + riser + `, "title": "Riser \"B\" <1>", "author": "M. Vane"}`
	framed, id := embedding(t, Config{FrameAncestors: []string{"*"}}, body)
	plain := &keeper{New(Config{Records: framed.records}), framed.records}
	prefixed := &keeper{New(Config{Records: framed.records, FrameAncestors: []string{"*"}, PublicURL: "https://tools.example/regimed/"}), framed.records}
	rows := []struct {
		of            *keeper
		address, more string
		html          string
		width, height int
		thumbnail     bool
	}{
		{framed, "http://regimed.example/v1/records/" + id, "", `src="http://regimed.example/embed/` + id + `"`, 640, 400, true},
		{framed, "https://REGIMED.example/v1/records/" + id + ".txt?engine=current#top", "&format=json", `src="https://regimed.example/embed/` + id + `"`, 640, 400, true},
		{framed, "http://regimed.example/v1/records/" + id[:12], "&maxwidth=400&maxheight=200&dnt=1", `src="http://regimed.example/embed/` + id + `"`, 400, 200, false},
		{framed, "http://regimed.example/embed/" + id + "?theme=dark&view=findings&other=1", "&maxwidth=2000", `/embed/` + id + `?theme=dark&amp;view=findings"`, 640, 400, true},
		{plain, "http://regimed.example/v1/records/" + id, "", `<img src="http://regimed.example/embed/` + id + `.svg"`, 640, 64, true},
		{plain, "http://regimed.example/v1/records/" + id, "&maxwidth=320", `<a href="http://regimed.example/v1/records/` + id, 320, 32, false},
		{plain, "http://regimed.example/v1/records/" + id, "&maxheight=16", `width="160" height="16"`, 160, 16, false},
		{plain, "http://regimed.example/v1/records/" + id, "&maxwidth=1", `width="1" height="1"`, 1, 1, false},
		{prefixed, "https://tools.example/regimed/v1/records/" + id, "", `src="https://tools.example/regimed/embed/` + id + `"`, 640, 400, true},
	}
	for _, row := range rows {
		r := row.of.askOembed(t, row.address, row.more)
		sent := bodyOf(t, r)
		var a oembedAnswer
		if err := json.Unmarshal(sent, &a); err != nil || r.StatusCode != http.StatusOK {
			t.Fatalf("%s: %d: %s", row.address, r.StatusCode, sent)
		}
		if a.Version != "1.0" || a.Type != "rich" || a.Title != `Riser "B" <1>` || a.AuthorName != "M. Vane" || a.ProviderName != "regimed" || a.CacheAge <= 0 {
			t.Errorf("%s", sent)
		}
		if !strings.Contains(strings.ToLower(a.HTML), row.html) || a.Width != row.width || a.Height != row.height || !strings.Contains(a.HTML, `Riser &#34;B&#34; &lt;1&gt;`) {
			t.Errorf("%s%s: %s", row.address, row.more, sent)
		}
		if (a.ThumbnailURL != "") != row.thumbnail || (a.ThumbnailWidth > 0) != row.thumbnail || (a.ThumbnailHeight > 0) != row.thumbnail {
			t.Errorf("%s%s: thumbnail %s", row.address, row.more, a.ThumbnailURL)
		}
	}
	if len(rows) != 9 {
		t.Errorf("%d rows", len(rows))
	}
}

func TestOembedAsXML(t *testing.T) {
	k, id := embedding(t, Config{FrameAncestors: []string{"*"}}, `{"case": `+riser+`, "title": "a < b & c"}`)
	address := "http://regimed.example/v1/records/" + id
	r := k.askOembed(t, address, "&format=xml")
	sent := bodyOf(t, r)
	if r.Header.Get("Content-Type") != typeXML || !bytes.HasPrefix(sent, []byte(`<?xml version="1.0"`)) {
		t.Errorf("%s", sent)
	}
	var fromXML, fromJSON oembedAnswer
	if err := xml.Unmarshal(sent, &fromXML); err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(bodyOf(t, k.askOembed(t, address, "")), &fromJSON); err != nil {
		t.Fatal(err)
	}
	fromXML.XMLName = xml.Name{}
	if fromXML != fromJSON || fromXML.Title != "a < b & c" || fromXML.AuthorName != "" {
		t.Errorf("%+v\n%+v", fromXML, fromJSON)
	}
}

func TestOembedRefuses(t *testing.T) {
	k, id := embedding(t, Config{}, `{"case": `+riser+`}`)
	good := "/oembed?url=" + url.QueryEscape("http://example.com/v1/records/"+id)
	rows := []struct {
		path    string
		status  int
		problem string
	}{
		{"/oembed", 422, "invalid-query"},
		{"/oembed?url=", 422, "invalid-query"},
		{"/oembed?url=/v1/records/" + id, 422, "invalid-query"},
		{"/oembed?url=ftp://example.com/v1/records/" + id, 422, "invalid-query"},
		{good + "&maxwidth=0", 422, "invalid-query"},
		{good + "&maxheight=1.5", 422, "invalid-query"},
		{good + "&url=x", 422, "invalid-query"},
		{"/oembed?url=%zz", 400, "bad-request"},
		{good + "&format=yaml", 501, "embed-format"},
		{"/oembed?format=", 501, "embed-format"},
		{"/oembed?url=http://other.example/v1/records/" + id, 404, "not-found"},
		{"/oembed?url=http://example.com:81/v1/records/" + id, 404, "not-found"},
		{"/oembed?url=http://example.com/v1/classify", 404, "not-found"},
		{"/oembed?url=http://example.com/v1/records/" + id + "/x", 404, "not-found"},
		{"/oembed?url=http://example.com/v1/records/" + strings.Repeat("0", 64), 404, "not-found"},
		{"/oembed?url=http://example.com/embed/" + id + ".html", 404, "not-found"},
	}
	for _, row := range rows {
		r := k.ask(t, http.MethodGet, row.path, "")
		if p := problemIn(t, r); r.StatusCode != row.status || p.Type != "/problems/"+row.problem {
			t.Errorf("%s: %d %s", row.path, r.StatusCode, p.Type)
		}
	}
	if len(rows) != 16 {
		t.Errorf("%d rows", len(rows))
	}
}

// A record says where its oEmbed answer is, and the answer is there.
func TestOembedDiscovery(t *testing.T) {
	k, id := embedding(t, Config{}, `{"case": `+riser+`}`)
	for _, suffix := range append([]string{""}, suffixes()...) {
		r := k.ask(t, http.MethodGet, "/v1/records/"+id+suffix, "")
		links := r.Header.Values("Link")
		if len(links) != 2 || r.Header.Get("Vary") != "Host" {
			t.Fatalf("%s: links %q, varying with %q", suffix, links, r.Header.Get("Vary"))
		}
		for i, format := range []string{"json", "xml"} {
			address, rest, _ := strings.Cut(strings.TrimPrefix(links[i], "<"), ">")
			if rest != fmt.Sprintf(`; rel="alternate"; type="%s"`, discoveryType(format)) {
				t.Errorf("%s", links[i])
			}
			if found := k.ask(t, http.MethodGet, address, ""); found.StatusCode != http.StatusOK {
				t.Errorf("%s: %d", address, found.StatusCode)
			}
			inPage := bytes.Contains(bodyOf(t, k.ask(t, http.MethodGet, "/v1/records/"+id+suffix, "")), []byte(`type="`+discoveryType(format)+`" href="http`))
			if isPage := r.Header.Get("Content-Type") == typeHTML; inPage != isPage {
				t.Errorf("%s: link in the page %t", suffix, inPage)
			}
		}
	}
	page := withDiscovery([]byte("<head><title>a</title></head><body></head>"), "http://a/oembed?url=b&format=")
	if want := `</title><link rel="alternate" type="application/json+oembed" href="http://a/oembed?url=b&amp;format=json">`; !strings.Contains(string(page), want) || strings.Count(string(page), "<link") != 2 {
		t.Errorf("%s", page)
	}
	if page := withDiscovery([]byte("<p>"), "http://a"); string(page) != "<p>" {
		t.Errorf("%s", page)
	}
}

func suffixes() []string {
	var list []string
	for _, name := range FormatNames() {
		list = append(list, "."+name)
	}
	return list
}

// A header Host that is no name of a host goes into no link.
func TestHostIsNotTrusted(t *testing.T) {
	k, id := embedding(t, Config{}, `{"case": `+riser+`}`)
	for _, name := range []string{`a"><script>`, "a b", "", "a/b", "a@b", strings.Repeat("a", 300), "a,b"} {
		r := newGet(t, "/v1/records/"+id)
		r.Host = name
		if answer := serve(t, k.Handler(), r); answer.StatusCode != http.StatusOK || len(answer.Header.Values("Link")) != 0 {
			t.Errorf("%q: %d, %q", name, answer.StatusCode, answer.Header.Values("Link"))
		}
		r = newGet(t, "/oembed?url="+url.QueryEscape("http://"+name+"/v1/records/"+id))
		r.Host = name
		if answer := serve(t, k.Handler(), r); answer.StatusCode < 400 {
			t.Errorf("%q: %d", name, answer.StatusCode)
		}
	}
	public := New(Config{Records: k.records, PublicURL: "https://regimed.example"})
	r := newGet(t, "/v1/records/"+id)
	r.Host = "other.example"
	h := serve(t, public.Handler(), r).Header
	if links := h.Values("Link"); len(links) != 2 || !strings.HasPrefix(links[0], "<https://regimed.example/oembed?") || h.Get("Vary") != "" {
		t.Errorf("%q, varying with %q", links, h.Get("Vary"))
	}
}

// The page of operations and its files.
func TestDocs(t *testing.T) {
	paths := []string{"/docs", "/docs/page.css", "/docs/page.js", "/docs/swagger-ui-bundle.js", "/docs/swagger-ui.css"}
	for _, path := range paths {
		r := call(t, http.MethodGet, path, "")
		if r.StatusCode != http.StatusOK || len(bodyOf(t, r)) == 0 || r.Header.Get("Content-Security-Policy") == "" || r.Header.Get("X-Frame-Options") != "DENY" {
			t.Errorf("%s: %d", path, r.StatusCode)
		}
		if again := call(t, http.MethodGet, path, "", "If-None-Match", r.Header.Get("ETag")); again.StatusCode != http.StatusNotModified {
			t.Errorf("%s: %d the second time", path, again.StatusCode)
		}
	}
	for _, path := range []string{"/docs/", "/docs/index.html", "/docs/LICENSE"} {
		if r := call(t, http.MethodGet, path, ""); r.StatusCode != http.StatusNotFound {
			t.Errorf("%s: %d", path, r.StatusCode)
		}
	}
}

// A record of another engine is embedded as it is. The strip says who drew it and
// is higher for that, and oEmbed knows.
func TestEmbeddingOfAnotherEngine(t *testing.T) {
	k := newKeeper(t)
	id := strings.TrimPrefix(elsewhere(t, k), "/v1/records/")
	page := string(bodyOf(t, k.ask(t, http.MethodGet, "/embed/"+id, "")))
	if !strings.Contains(page, "Answered by regimed 0.0.7 on 2026-07-30") {
		t.Errorf("%s", page)
	}
	strip := bodyOf(t, k.ask(t, http.MethodGet, "/embed/"+id+".svg", ""))
	root, _, err := rootOfSVG(strip)
	if err != nil || !strings.Contains(string(strip), "drawn by regimed") {
		t.Fatalf("%v: %s", err, strip)
	}
	width, height := sizeOfSVG(root.Attr)
	var a oembedAnswer
	if err := json.Unmarshal(bodyOf(t, k.askOembed(t, "http://regimed.example/v1/records/"+id, "")), &a); err != nil {
		t.Fatal(err)
	}
	if height <= 64 || float64(a.Width) != width || float64(a.Height) != height || float64(a.ThumbnailHeight) != height {
		t.Errorf("%g by %g: %+v", width, height, a)
	}
}

// A case that the engine no longer takes can't be drawn, but its answer shown.
func TestEmbeddingOfAnOutdatedCase(t *testing.T) {
	k := newKeeper(t)
	r := stored(t, "")
	r.ID, r.Case = readDigest(t, r.Answer), []byte(`{"structure": {"kind": "cylinder", "support": "hinged"}}`)
	if _, _, err := k.records.Put(t.Context(), r); err != nil {
		t.Fatal(err)
	}
	if page := k.ask(t, http.MethodGet, "/embed/"+r.ID, ""); page.StatusCode != http.StatusOK {
		t.Errorf("the page: %d", page.StatusCode)
	}
	if strip := k.ask(t, http.MethodGet, "/embed/"+r.ID+".svg", ""); strip.StatusCode != http.StatusConflict {
		t.Errorf("the strip: %d", strip.StatusCode)
	}
	var a oembedAnswer
	if err := json.Unmarshal(bodyOf(t, k.askOembed(t, "http://regimed.example/v1/records/"+r.ID, "")), &a); err != nil {
		t.Fatal(err)
	}
	if a.ThumbnailURL != "" || strings.Contains(a.HTML, "<img") || !strings.HasPrefix(a.HTML, `<a href="http://regimed.example/v1/records/`) {
		t.Errorf("%+v", a)
	}
}
