package api

import (
	"net/http"
	"os"
	"slices"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"
)

const rodCase = `{"structure": {"kind": "cylinder", "diameter": "40 mm", "frequency_dry": "12 Hz"}, "fluid": "seawater", "flow": {"speed": "1 m/s"}}`

func TestCompare(t *testing.T) {
	other := strings.Replace(rodCase, `"1 m/s"`, `"0.5 m/s"`, 1)
	r := call(t, http.MethodPost, "/v1/compare", `{"a": `+rodCase+`, "b": `+other+`}`)
	var c ComparisonRecord
	if err := json.Unmarshal(bodyOf(t, r), &c, json.RejectUnknownMembers(true)); err != nil || r.StatusCode != http.StatusOK {
		t.Fatalf("status %d: %v", r.StatusCode, err)
	}
	at := slices.IndexFunc(c.Groups, func(g GroupPairRecord) bool { return g.ID == "reynolds" })
	if at < 0 || *c.Groups[at].Factor != 0.5 || c.Groups[at].Kept || c.Tolerance != 0.02 || c.Kept+c.Distorted != len(c.Groups) {
		t.Errorf("%+v", c)
	}
	if c.A.Digest == c.B.Digest || c.A.Kind != "cylinder" || c.A.Class == "" {
		t.Errorf("%+v and %+v", c.A, c.B)
	}
	// of two kinds, with a tolerance of the caller's
	r = call(t, http.MethodPost, "/v1/compare", `{"tolerance": 0.6, "b": `+riser+`, "a": {"structure": {"kind": "generic", "length": "1 m"}, "fluid": "air", "flow": {"speed": "1 m/s"}}}`)
	if err := json.Unmarshal(bodyOf(t, r), &c); err != nil || r.StatusCode != http.StatusOK || c.Tolerance != 0.6 || c.A.Kind != "generic" || len(c.OnlyB) < 5 || len(c.Verdicts) < 5 || len(c.Axes) == 0 {
		t.Errorf("status %d: %v %+v", r.StatusCode, err, c)
	}
}

// What is wrong with a request is said at once, each at its place.
func TestCompareRefuses(t *testing.T) {
	rows := []struct {
		name, body string
		want       []string
	}{
		{"nothing", `{}`, []string{"/a missing", "/b missing"}},
		{"a list", `[]`, []string{" wrong-type"}},
		{"both wrong", `{"a": {"structure": {"kind": "cylinder", "diameter": "1 kg"}}, "b": {"structure": {"kind": "cilinder"}}, "c": 1}`,
			[]string{"/a/structure/diameter wrong-dimension", "/b/structure/kind unknown-kind", "/c unknown-field"}},
		{"no case", `{"a": 1, "b": null}`, []string{"/a wrong-type", "/b wrong-type"}},
		{"twice", `{"a": ` + rodCase + `, "a": ` + rodCase + `, "b": ` + rodCase + `}`, []string{"/a duplicate"}},
		{"twice inside", `{"a": {"structure": {"kind": "generic", "length": "1 m", "length": "2 m"}}, "b": ` + rodCase + `}`, []string{"/a/structure/length duplicate"}},
		{"a contradiction", `{"a": ` + rodCase + `, "b": {"structure": {"kind": "generic", "length": "1 m"}, "flow": {"speed": "1 m/s"}}}`, []string{"/b/fluid missing"}},
		{"tolerance", `{"a": ` + rodCase + `, "b": ` + rodCase + `, "tolerance": "2 %"}`, []string{"/tolerance wrong-type"}},
		{"tolerance beyond a double", `{"a": ` + rodCase + `, "b": ` + rodCase + `, "tolerance": 1e999}`, []string{"/tolerance wrong-type"}},
		{"tolerance below zero", `{"a": ` + rodCase + `, "b": ` + rodCase + `, "tolerance": -1}`, []string{"/tolerance out-of-range"}},
		{"misspelt", `{"a": ` + rodCase + `, "b": ` + rodCase + `, "tolerence": 1}`, []string{"/tolerence unknown-field"}},
	}
	ran := 0
	for _, row := range rows {
		checkRefused(t, "/v1/compare", row.name, row.body, row.want)
		ran++
	}
	if ran != 11 {
		t.Errorf("%d rows", ran)
	}
	checkMalformed(t, "/v1/compare")
}

// checkRefused holds the violations of a request against those that are wanted.
func checkRefused(t *testing.T, path, name, body string, want []string) {
	t.Helper()
	p := problemIn(t, call(t, http.MethodPost, path, body))
	var got []string
	for _, v := range p.Violations {
		got = append(got, v.Pointer+" "+string(v.Code))
	}
	if p.Type != invalidCase.URI() || !slices.Equal(got, want) {
		t.Errorf("%s: %s %v, wanted %v", name, p.Type, got, want)
	}
}

// checkMalformed sends what is no JSON, no JSON by its type, and a query.
func checkMalformed(t *testing.T, path string) {
	t.Helper()
	for _, body := range []string{"", "{", `{"a": `, `{"a": 1}}`, "{\"a\": \"\xff\"}", `{'a': 1}`} {
		if p := problemIn(t, call(t, http.MethodPost, path, body)); p.Type != malformedJSON.URI() || p.Offset == nil {
			t.Errorf("%q: %+v", body, p)
		}
	}
	if p := problemIn(t, call(t, http.MethodPost, path, `{}`, "Content-Type", "text/plain")); p.Type != unsupportedMedia.URI() {
		t.Errorf("text: %+v", p)
	}
	if p := problemIn(t, call(t, http.MethodPost, path+"?fields=a", `{}`)); p.Type != invalidQuery.URI() {
		t.Errorf("a query: %+v", p)
	}
	if p := problemIn(t, call(t, http.MethodPost, path, strings.Repeat(" ", 2<<20))); p.Type != tooLarge.URI() {
		t.Errorf("a large body: %+v", p)
	}
}

// FuzzCompare sends any body to what compares and what scales: the answer is JSON,
// and never a fault of the server.
func FuzzCompare(f *testing.F) {
	f.Add([]byte(`{"a": ` + rodCase + `, "b": ` + riser + `}`))
	f.Add([]byte(`{"case": ` + riser + `, "length": "1:40", "keep": ["froude", "cauchy"]}`))
	f.Add([]byte(`{"case": ` + rodCase + `, "length": 0.5, "keep": ["reynolds", "froude"], "free": ["fluid"], "speed": "1e-9"}`))
	for _, file := range shippedCases(f) {
		body, err := os.ReadFile(file)
		if err != nil {
			f.Fatal(err)
		}
		f.Add(append(append([]byte(`{"length": "1:30", "keep": ["froude"], "fluid": "water", "case": `), body...), '}'))
	}
	f.Fuzz(func(t *testing.T, body []byte) {
		for _, path := range []string{"/v1/compare", "/v1/scale"} {
			r := call(t, http.MethodPost, path, string(body))
			answer := jsontext.Value(bodyOf(t, r))
			if r.StatusCode >= 500 || !answer.IsValid() {
				t.Fatalf("status %d: %s", r.StatusCode, answer)
			}
		}
	})
}
