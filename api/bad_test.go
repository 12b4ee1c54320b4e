package api

import (
	"bytes"
	"io"
	"net/http"
	"net/http/httptest"
	"slices"
	"strings"
	"testing"

	"github.com/go-json-experiment/json/jsontext"
)

// cylinderWith is a case of a cylinder with further members in its structure.
func cylinderWith(members string) string {
	return `{"structure": {"kind": "cylinder", "diameter": "0.3 m"` + members + `}, "fluid": "water"}`
}

// caseWith is a good case with further members at its top.
func caseWith(members string) string {
	return `{"structure": {"kind": "cylinder", "diameter": "0.3 m", "frequency_dry": "2 Hz"}` + members + `}`
}

// badCases are bodies that are JSON and no case: what must be found in each,
// as "pointer code", all of it.
var badCases = []struct {
	name, body string
	want       []string
}{
	{"unknown unit", cylinderWith(`, "length": "40 metres"`), []string{"/structure/length unknown-unit"}},
	{"wrong dimension", cylinderWith(`, "length": "40 kg"`), []string{"/structure/length wrong-dimension"}},
	{"ambiguous unit", cylinderWith(`, "tip_mass": "4 lb", "support": "clamped-free"`), []string{"/structure/tip_mass ambiguous-unit"}},
	{"bare rate", cylinderWith(`, "frequency_dry": "2 1/s"`), []string{"/structure/frequency_dry wrong-kind"}},
	{"number without unit", cylinderWith(`, "length": 40`), []string{"/structure/length missing-unit"}},
	{"text without number", cylinderWith(`, "length": "long"`), []string{"/structure/length syntax"}},
	{"empty text", cylinderWith(`, "length": ""`), []string{"/structure/length syntax"}},
	{"not a number as text", cylinderWith(`, "length": "NaN m"`), []string{"/structure/length not-finite"}},
	{"infinite as text", cylinderWith(`, "length": "inf m"`), []string{"/structure/length not-finite"}},
	{"number beyond a double", cylinderWith(`, "damping_ratio": 1e400`), []string{"/structure/damping_ratio not-finite"}},
	{"number beyond a double in an object", cylinderWith(`, "length": {"value": 1e999, "unit": "m"}`), []string{"/structure/length/value not-finite"}},
	{"text beyond a double", cylinderWith(`, "length": "1e400 m"`), []string{"/structure/length not-finite"}},
	{"negative length", `{"structure": {"kind": "cylinder", "diameter": "-0.3 m"}}`, []string{"/structure/diameter out-of-range"}},
	{"no length", `{"structure": {"kind": "cylinder", "diameter": "0 m"}}`, []string{"/structure/diameter out-of-range"}},
	{"below absolute zero", `{"structure": {"kind": "cylinder", "diameter": "1 m"}, "fluid": {"name": "water", "temperature": "-300 degC"}}`,
		[]string{"/fluid/temperature below-absolute-zero"}},
	{"above the range of the fluid", `{"structure": {"kind": "cylinder", "diameter": "1 m"}, "fluid": {"name": "water", "temperature": "400 degC"}}`,
		[]string{"/fluid/temperature out-of-range"}},
	{"range upside down", cylinderWith(`, "length": "3 .. 2 m"`), []string{"/structure/length bad-range"}},
	{"negative uncertainty", cylinderWith(`, "length": {"value": 3, "unit": "m", "std": -1}`), []string{"/structure/length negative-uncertainty"}},
	{"unknown member of an object", cylinderWith(`, "length": {"value": 3, "units": "m"}`), []string{"/structure/length/units unknown-field"}},
	{"unit that is no text", cylinderWith(`, "length": {"value": 3, "unit": 1}`), []string{"/structure/length/unit wrong-type"}},
	{"list for a quantity", cylinderWith(`, "length": ["3 m"]`), []string{"/structure/length wrong-type"}},
	{"null", cylinderWith(`, "length": null`), []string{"/structure/length wrong-type"}},
	{"null for a block", `{"structure": {"kind": "cylinder", "diameter": "1 m"}, "flow": null}`, []string{"/flow wrong-type"}},
	{"null for the structure", `{"structure": null}`, []string{"/structure wrong-type"}},
	{"text for a flag", cylinderWith(`, "contents_included": "yes"`), []string{"/structure/contents_included wrong-type"}},
	{"half a mode", cylinderWith(`, "mode": 1.5`), []string{"/structure/mode wrong-type"}},
	{"mode out of range", cylinderWith(`, "mode": 0`), []string{"/structure/mode out-of-range"}},
	{"unknown name", cylinderWith(`, "support": "pinned"`), []string{"/structure/support unknown-choice"}},
	{"number for a name", cylinderWith(`, "support": 2`), []string{"/structure/support wrong-type"}},
	{"unknown field", cylinderWith(`, "lenght": "3 m"`), []string{"/structure/lenght unknown-field"}},
	{"field in other letters", cylinderWith(`, "Length": "3 m"`), []string{"/structure/Length unknown-field"}},
	{"field with signs of a pointer", cylinderWith(`, "a/b~c": 1`), []string{"/structure/a~1b~0c unknown-field"}},
	{"unknown block", caseWith(`, "fluids": "water"`), []string{"/fluids unknown-field"}},
	{"unknown kind", `{"structure": {"kind": "cilinder", "diameter": "1 m"}}`, []string{"/structure/kind unknown-kind"}},
	{"kind that is no text", `{"structure": {"kind": 3}}`, []string{"/structure/kind wrong-type"}},
	{"no kind", `{"structure": {}}`, []string{"/structure/kind missing"}},
	{"no structure", `{"fluid": "water"}`, []string{"/structure missing"}},
	{"empty object", `{}`, []string{"/structure missing"}},
	{"no diameter", `{"structure": {"kind": "cylinder"}}`, []string{"/structure/diameter missing"}},
	{"flow without fluid", caseWith(`, "flow": {"speed": "1 m/s"}`), []string{"/fluid missing"}},
	{"two radii", cylinderWith(`, "radius": "0.2 m"`), []string{"/structure/radius contradiction"}},
	{"wall thicker than the radius", cylinderWith(`, "wall_thickness": "0.2 m"`), []string{"/structure/wall_thickness contradiction"}},
	{"gauge pressure alone", `{"structure": {"kind": "cylinder", "diameter": "1 m"}, "fluid": {"name": "water", "pressure": "3 barg"}}`,
		[]string{"/fluid/pressure wrong-kind"}},
	{"field twice", cylinderWith(`, "length": "3 m", "length": "3 m"`), []string{"/structure/length duplicate"}},
	{"block twice", caseWith(`, "fluid": "water", "fluid": "air"`), []string{"/fluid duplicate"}},
	{"structure twice", `{"structure": {"kind": "cylinder", "diameter": "1 m"}, "structure": {"kind": "plate"}}`, []string{"/structure duplicate"}},
	{"member of a quantity twice", cylinderWith(`, "length": {"value": 1, "value": 2, "unit": "m"}`), []string{"/structure/length/value duplicate"}},
	{"ends in the wrong order", caseWith(`, "fluid": "water", "flow": {"speed": "1 m/s", "operating": ["2 m/s", "1 m/s"]}`), []string{"/flow/operating contradiction"}},
	{"three ends", caseWith(`, "fluid": "water", "flow": {"speed": "1 m/s", "operating": ["0 m/s", "1 m/s", "2 m/s"]}`), []string{"/flow/operating wrong-type"}},
	{"unknown measure", caseWith(`, "interest": ["frequency", "noise"]`), []string{"/interest/1 unknown-choice"}},
	{"tolerance above one", caseWith(`, "tolerance": {"load": 2}`), []string{"/tolerance/load out-of-range"}},
	{"unknown preset", caseWith(`, "tolerance": "strict"`), []string{"/tolerance unknown-choice"}},
	{"long title", caseWith(`, "title": "` + strings.Repeat("x", 300) + `"`), []string{"/title out-of-range"}},
	{"list in place of a case", `[]`, []string{" wrong-type"}},
	{"text in place of a case", `"cylinder"`, []string{" wrong-type"}},
	{"null in place of a case", `null`, []string{" wrong-type"}},
	{"deep value of an unknown field", caseWith(`, "x": ` + strings.Repeat("[", 5000) + strings.Repeat("]", 5000)), []string{"/x unknown-field"}},
	{"six at once", `{"structure": {"kind": "cylinder", "diameter": "0.3 kg", "lenght": "40 m", "frequency_dry": 1.2, "mode": "one", "support": null},
		"fluid": "seawatter", "flow": {"speed": "2 knotts", "direction": "sideways"}, "colour": "red"}`,
		[]string{"/colour unknown-field", "/flow/direction unknown-choice", "/flow/speed unknown-unit", "/fluid unknown-choice", "/structure/diameter wrong-dimension",
			"/structure/frequency_dry missing-unit", "/structure/lenght unknown-field", "/structure/mode wrong-type", "/structure/support wrong-type"}},
}

func TestBadCases(t *testing.T) {
	for _, row := range badCases {
		t.Run(row.name, func(t *testing.T) {
			r := call(t, http.MethodPost, "/v1/classify", row.body)
			p := problemIn(t, r)
			if r.StatusCode != http.StatusUnprocessableEntity || p.Type != "/problems/invalid-case" {
				t.Fatalf("status %d, %s: %s", r.StatusCode, p.Type, p.Detail)
			}
			if got := found(p); !slices.Equal(got, row.want) {
				t.Errorf("found  %q\nwanted %q", got, row.want)
			}
			checkViolations(t, p)
		})
	}
	if len(badCases) != 58 {
		t.Errorf("%d rows", len(badCases))
	}
}

// found lists the violations of a problem as "pointer code".
func found(p Problem) []string {
	var list []string
	for _, v := range p.Violations {
		list = append(list, v.Pointer+" "+string(v.Code))
	}
	slices.Sort(list)
	return list
}

// checkViolations checks what every violation has: a documented code, a
// sentence, a pointer, and a value that any reader of JSON can take.
func checkViolations(t *testing.T, p Problem) {
	t.Helper()
	for _, v := range p.Violations {
		if !slices.ContainsFunc(codes, func(c codeRecord) bool { return c.Code == v.Code }) {
			t.Errorf("the code %q is not documented", v.Code)
		}
		if len(v.Detail) < 10 || len(v.Detail) > 900 {
			t.Errorf("%s: a sentence of %d bytes: %s", v.Pointer, len(v.Detail), v.Detail)
		}
		if v.Pointer != "" && v.Pointer[0] != '/' {
			t.Errorf("the pointer %q", v.Pointer)
		}
		if len(v.Value) > 400 || v.Value != nil && !v.Value.IsValid() {
			t.Errorf("%s: value %s", v.Pointer, v.Value)
		}
	}
}

// What was received comes back as it was, where it can be read.
func TestReceivedValues(t *testing.T) {
	rows := []struct{ sent, back string }{
		{`"40 metres"`, `"40 metres"`},
		{`40.50`, `40.50`},
		{`null`, `null`},
		{`[1, 2]`, `[1, 2]`},
		{`1e400`, `"1e400"`},
		{`[1, -1e999]`, `"[1, -1e999]"`},
		{`[{"a": 1, "a": 2}]`, `"[{\"a\": 1, \"a\": 2}]"`},
	}
	for _, row := range rows {
		p := problemIn(t, call(t, http.MethodPost, "/v1/classify", cylinderWith(`, "length": `+row.sent)))
		if len(p.Violations) == 0 {
			t.Errorf("%s is no violation", row.sent)
			continue
		}
		got, want := jsontext.Value(slices.Clone(p.Violations[0].Value)), jsontext.Value(row.back)
		if got.Compact() != nil || want.Compact() != nil || !bytes.Equal(got, want) {
			t.Errorf("sent %s, came back as %s", row.sent, got)
		}
	}
	if p := problemIn(t, call(t, http.MethodPost, "/v1/classify", `{"structure": {"kind": "cylinder"}}`)); p.Violations[0].Value != nil {
		t.Errorf("a value that was not sent: %s", p.Violations[0].Value)
	}
	if len(rows) != 7 {
		t.Errorf("%d rows", len(rows))
	}
}

// The nearest names are offered.
func TestSuggestions(t *testing.T) {
	rows := []struct{ body, wanted string }{
		{`{"structure": {"kind": "cilinder"}}`, "cylinder"},
		{cylinderWith(`, "lenght": "1 m"`), "length"},
		{caseWith(`, "fluid": "watter"`), "water"},
		{caseWith(`, "flow": {"speed": "3 kmh"}, "fluid": "air"`), "km/h"},
		{cylinderWith(`, "tip_mass": "4 lb", "support": "clamped-free"`), "lbm"},
	}
	for _, row := range rows {
		p := problemIn(t, call(t, http.MethodPost, "/v1/classify", row.body))
		if len(p.Violations) == 0 || !strings.Contains(p.Violations[0].Detail, row.wanted) {
			t.Errorf("%s: %+v", row.body, p.Violations)
		}
	}
	if len(rows) != 5 {
		t.Errorf("%d rows", len(rows))
	}
}

// badBodies are bodies that are no JSON.
var badBodies = []struct{ name, body string }{
	{"empty", ""},
	{"blank", " \n"},
	{"cut short", `{"structure": {"kind": "cylinder"`},
	{"data after the case", riser + `{}`},
	{"letters after the case", riser + `x`},
	{"comma at the end", `{"structure": {"kind": "cylinder",}}`},
	{"comment", `{"structure": {"kind": "cylinder"}} // note`},
	{"single quotes", `{'structure': 1}`},
	{"NaN", cylinderWith(`, "damping_ratio": NaN`)},
	{"Infinity", cylinderWith(`, "damping_ratio": -Infinity`)},
	{"hexadecimal", cylinderWith(`, "mode": 0x1`)},
	{"leading zero", cylinderWith(`, "mode": 01`)},
	{"leading plus", cylinderWith(`, "mode": +1`)},
	{"invalid UTF-8", cylinderWith(", \"support\": \"\xff\"")},
	{"invalid UTF-8 in a name", cylinderWith(", \"\xc3\": 1")},
	{"half a surrogate", cylinderWith(`, "support": "\ud800"`)},
	{"control character", cylinderWith(", \"support\": \"a\x00b\"")},
	{"byte order mark", "\ufeff" + riser},
	{"two bytes a letter", "\xff\xfe{\x00}\x00"},
	{"form", "structure=cylinder"},
	{"markup", "<structure/>"},
	{"nested ten thousand deep", strings.Repeat("[", 10001) + strings.Repeat("]", 10001)},
	{"nested without end", strings.Repeat(`{"structure":`, 20000)},
	{"nested deep in a field", caseWith(`, "x": ` + strings.Repeat("[", 10001) + strings.Repeat("]", 10001))},
}

func TestBadBodies(t *testing.T) {
	for _, row := range badBodies {
		t.Run(row.name, func(t *testing.T) {
			r := call(t, http.MethodPost, "/v1/classify", row.body)
			p := problemIn(t, r)
			if r.StatusCode != http.StatusBadRequest || p.Type != "/problems/malformed-json" {
				t.Fatalf("status %d, %s: %s", r.StatusCode, p.Type, p.Detail)
			}
			if p.Offset == nil || *p.Offset < 0 || *p.Offset > int64(len(row.body)) {
				t.Errorf("offset %v of %d bytes", p.Offset, len(row.body))
			}
			if len(p.Detail) > 400 {
				t.Errorf("a detail of %d bytes", len(p.Detail))
			}
		})
	}
	if len(badBodies) != 24 {
		t.Errorf("%d rows", len(badBodies))
	}
}

// badRequests fail before their body is looked at.
var badRequests = []struct {
	name, method, path string
	status             int
	problem            string
}{
	{"two slashes", http.MethodGet, "//", 404, "not-found"},
	{"unknown path", http.MethodGet, "/v1/clasify", 404, "not-found"},
	{"path in other letters", http.MethodGet, "/V1/Catalog", 404, "not-found"},
	{"path with a slash behind", http.MethodGet, "/v1/catalog/", 404, "not-found"},
	{"unknown catalogue", http.MethodGet, "/v1/catalog/fluid", 404, "not-found"},
	{"unknown solution", http.MethodGet, "/v1/canon/OscillatingCilinder", 404, "not-found"},
	{"unknown problem", http.MethodGet, "/problems/none", 404, "not-found"},
	{"way up", http.MethodGet, "/v1/../etc/passwd", 404, "not-found"},
	{"encoded way up", http.MethodGet, "/problems/%2e%2e%2fetc", 404, "not-found"},
	{"wrong method", http.MethodGet, "/v1/classify", 405, "method-not-allowed"},
	{"head of a post", http.MethodHead, "/v1/classify", 405, ""},
	{"delete", http.MethodDelete, "/v1/classify", 405, "method-not-allowed"},
	{"post to a catalogue", http.MethodPost, "/v1/catalog/kinds", 405, "method-not-allowed"},
	{"put", http.MethodPut, "/healthz", 405, "method-not-allowed"},
	{"unknown method", "BREW", "/v1/classify", 405, "method-not-allowed"},
	{"unknown member", http.MethodPost, "/v1/classify?fields=recomendation", 422, "invalid-query"},
	{"empty member", http.MethodPost, "/v1/classify?fields=", 422, "invalid-query"},
	{"one empty member", http.MethodPost, "/v1/classify?fields=findings,,groups", 422, "invalid-query"},
	{"members twice", http.MethodPost, "/v1/classify?fields=findings&fields=groups", 422, "invalid-query"},
	{"too many members", http.MethodPost, "/v1/classify?fields=" + strings.Repeat("groups,", 40) + "groups", 422, "invalid-query"},
	{"unknown parameter", http.MethodPost, "/v1/classify?field=findings", 422, "invalid-query"},
	{"too few samples", http.MethodPost, "/v1/classify?samples=63", 422, "invalid-query"},
	{"too many samples", http.MethodPost, "/v1/classify?samples=65537", 422, "invalid-query"},
	{"no samples", http.MethodPost, "/v1/classify?samples=0", 422, "invalid-query"},
	{"samples that are no number", http.MethodPost, "/v1/classify?samples=1e3", 422, "invalid-query"},
	{"a choice that is none", http.MethodPost, "/v1/classify?what_if=maybe", 422, "invalid-query"},
	{"a choice that is empty", http.MethodPost, "/v1/classify?what_if=", 422, "invalid-query"},
	{"parameter of a catalogue", http.MethodGet, "/v1/catalog/kinds?kind=cylinder", 422, "invalid-query"},
	{"query with a bad escape", http.MethodPost, "/v1/classify?fields=%zz", 400, "bad-request"},
	{"query with a semicolon", http.MethodGet, "/v1/catalog?a;b", 400, "bad-request"},
	{"argument missing", http.MethodGet, "/v1/canon/OscillatingCylinder", 422, "invalid-query"},
	{"argument that is no number", http.MethodGet, "/v1/canon/OscillatingCylinder?R=many", 422, "invalid-query"},
	{"argument not a number", http.MethodGet, "/v1/canon/OscillatingCylinder?R=NaN", 422, "invalid-query"},
	{"argument infinite", http.MethodGet, "/v1/canon/OscillatingCylinder?R=1e999", 422, "invalid-query"},
	{"argument negative", http.MethodGet, "/v1/canon/OscillatingCylinder?R=-1", 422, "invalid-query"},
	{"argument twice", http.MethodGet, "/v1/canon/OscillatingCylinder?R=1&R=2", 422, "invalid-query"},
	{"unknown argument", http.MethodGet, "/v1/canon/OscillatingCylinder?R=1&x=2", 422, "invalid-query"},
}

func TestBadRequests(t *testing.T) {
	for _, row := range badRequests {
		t.Run(row.name, func(t *testing.T) {
			r := call(t, row.method, row.path, riser)
			if r.StatusCode != row.status {
				t.Fatalf("status %d, wanted %d", r.StatusCode, row.status)
			}
			if row.status == http.StatusMethodNotAllowed && r.Header.Get("Allow") == "" {
				t.Error("no Allow")
			}
			if row.problem == "" {
				return
			}
			p := problemIn(t, r)
			if p.Type != "/problems/"+row.problem {
				t.Errorf("%s: %s", p.Type, p.Detail)
			}
			if row.status == http.StatusUnprocessableEntity && len(p.Violations) == 0 {
				t.Error("no violations")
			}
			checkViolations(t, p)
		})
	}
	if len(badRequests) != 37 {
		t.Errorf("%d rows", len(badRequests))
	}
}

// A large body is refused by its announced length, and one without by what
// arrives of it.
func TestLargeBodies(t *testing.T) {
	large := strings.Repeat(" ", 10<<20) + riser
	for _, chunked := range []bool{false, true} {
		var body io.Reader = strings.NewReader(large)
		if chunked {
			body = struct{ io.Reader }{body} // of unknown length
		}
		r := httptest.NewRequest(http.MethodPost, "/v1/classify", body)
		r.Header.Set("Content-Type", "application/json")
		if chunked {
			r.ContentLength = -1
		}
		if p := problemIn(t, serve(t, handler, r)); p.Status != http.StatusRequestEntityTooLarge || p.Type != "/problems/payload-too-large" {
			t.Errorf("chunked %v: %d %s", chunked, p.Status, p.Type)
		}
	}
	limited := New(Config{BodyLimit: int64(len(riser))}).Handler()
	for extra, status := range map[string]int{"": http.StatusOK, " ": http.StatusRequestEntityTooLarge} {
		r := httptest.NewRequest(http.MethodPost, "/v1/classify", strings.NewReader(riser+extra))
		r.Header.Set("Content-Type", "application/json")
		if got := serve(t, limited, r); got.StatusCode != status {
			t.Errorf("%d bytes over the limit: status %d", len(extra), got.StatusCode)
		}
	}
}

func TestCompressedBody(t *testing.T) {
	r := call(t, http.MethodPost, "/v1/classify", riser, "Content-Encoding", "gzip")
	if p := problemIn(t, r); p.Status != http.StatusUnsupportedMediaType || r.Header.Get("Accept-Encoding") != "identity" {
		t.Errorf("status %d, Accept-Encoding %q", p.Status, r.Header.Get("Accept-Encoding"))
	}
	if r := call(t, http.MethodPost, "/v1/classify", riser, "Content-Encoding", "identity"); r.StatusCode != http.StatusOK {
		t.Errorf("identity: status %d", r.StatusCode)
	}
}

// More than a hundred violations end in one that says so.
func TestManyViolations(t *testing.T) {
	var b strings.Builder
	b.WriteString(`{"structure": {"kind": "cylinder", "diameter": "1 m"`)
	for i := range 500 {
		b.WriteString(`, "x` + strings.Repeat("y", i) + `": 1`)
	}
	b.WriteString(`}}`)
	p := problemIn(t, call(t, http.MethodPost, "/v1/classify", b.String()))
	if n := len(p.Violations); n != 101 || p.Violations[n-1].Code != "too-many" {
		t.Errorf("%d violations", n)
	}
}
