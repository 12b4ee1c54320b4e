package render

import (
	"bytes"
	"encoding/json"
	"errors"
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"

	"github.com/go-json-experiment/json/jsontext"
	"pgregory.net/rapid"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/group"
	"regimed/regime/scale"
)

func TestJSONIsValid(t *testing.T) {
	rows := 0
	for name, a := range answers(t) {
		for only := Fields(0); only <= All; only += 1 + only/9 {
			out := AppendJSON([]byte("before"), a, only)
			if !bytes.HasPrefix(out, []byte("before{")) {
				t.Fatalf("%s: does not append", name)
			}
			out = out[len("before"):]
			if !jsontext.Value(out).IsValid() {
				t.Fatalf("%s, members %b: no valid JSON: %s", name, only, out)
			}
			for _, bad := range []string{"NaN", "Inf", "undefined", "unknown"} {
				if bytes.Contains(out, []byte(bad)) {
					t.Errorf("%s: contains %s", name, bad)
				}
			}
			rows++
		}
	}
	if rows < 150 {
		t.Errorf("only %d rows ran", rows)
	}
}

// keysOf gathers the paths of all members; ids that depend on the case become *.
func keysOf(dst map[string]bool, path string, v any) {
	switch v := v.(type) {
	case []any:
		for _, e := range v {
			keysOf(dst, path+"[]", e)
		}
	case map[string]any:
		for k, e := range v {
			if path == "scales" || path == "groups" || path == "findings" || path == "setup" || strings.HasSuffix(path, ".with") ||
				strings.HasSuffix(path, ".probability") || strings.HasSuffix(path, ".standard_error") {
				k = "*"
			}
			next := strings.TrimPrefix(path+"."+k, ".")
			dst[next] = true
			keysOf(dst, next, e)
		}
	}
}

// contract are the members that pipelines branch on. It may grow.
var contract = strings.Fields(`
cautions digest engine engine.catalogue engine.version
findings findings.* findings.*.basis findings.*.because findings.*.estimate findings.*.factor
findings.*.holds_up_to findings.*.holds_up_to[].bound findings.*.holds_up_to[].input findings.*.holds_up_to[].unit findings.*.holds_up_to[].value
findings.*.leaves_out findings.*.limit findings.*.margin findings.*.measure findings.*.needs findings.*.of_interest
findings.*.parts findings.*.parts[].basis findings.*.parts[].because findings.*.parts[].estimate findings.*.parts[].factor
findings.*.parts[].limit findings.*.parts[].margin findings.*.parts[].measure findings.*.parts[].of_interest
findings.*.parts[].source findings.*.parts[].utilisation findings.*.parts[].verdict
findings.*.source findings.*.title findings.*.utilisation findings.*.verdict
frequencies frequencies[].id frequencies[].ratio_to_wet frequencies[].title frequencies[].unit frequencies[].value
groups groups.* groups.*.band groups.*.because groups.*.definition groups.*.symbol groups.*.title groups.*.value groups.*.with groups.*.with.*
kind
recommendation recommendation.axes recommendation.axes.compressible recommendation.axes.coupling recommendation.axes.dimensions
recommendation.axes.electromechanical recommendation.axes.fluid recommendation.axes.fluid_inertia recommendation.axes.free_surface
recommendation.axes.phases recommendation.axes.structure recommendation.axes.turbulence recommendation.axes.viscous
recommendation.class recommendation.conditions recommendation.provisional recommendation.if_settled
recommendation.if_settled[].finding recommendation.if_settled[].needs recommendation.if_settled[].would_become
recommendation.justification recommendation.rank recommendation.rejected recommendation.rejected[].because
recommendation.rejected[].class recommendation.rejected[].sentence recommendation.rejected[].title recommendation.solves recommendation.title
reference
scales scales.* scales.*.note scales.*.origin scales.*.symbol scales.*.title scales.*.unit scales.*.value
study study.interest study.tolerance study.tolerance.frequency study.tolerance.load study.tolerance.name study.tolerance.response
setup title warnings warnings[].code warnings[].pointer warnings[].sentence
`)

// seldom are members that only some answers have.
var seldom = strings.Fields(`
modes modes[].class modes[].finding modes[].frequency_dry modes[].frequency_wet modes[].mode modes[].unit modes[].utilisation findings.*.mode
setup.* setup.*.governs setup.*.rule setup.*.source setup.*.title setup.*.unit setup.*.value
findings.*.published findings.*.published[].clause findings.*.published[].criterion findings.*.published[].edition
findings.*.published[].formula findings.*.published[].limit findings.*.published[].picked findings.*.published[].source
findings.*.published[].standard findings.*.published[].utilisation findings.*.published[].verdict
findings.*.drivers findings.*.drivers[].input findings.*.drivers[].sensitivity
turning_points turning_points[].class turning_points[].direction turning_points[].factor turning_points[].finding turning_points[].gauge
turning_points[].input turning_points[].pointer turning_points[].sentence turning_points[].unit turning_points[].value turning_points[].verdict
recommendation.beside recommendation.beside.class recommendation.beside.title study.criterion
groups.*.quantiles findings.*.quantiles findings.*.probability findings.*.probability.* findings.*.standard_error findings.*.standard_error.*
recommendation.probability recommendation.probability.* recommendation.standard_error recommendation.standard_error.*
uncertainty uncertainty.inputs uncertainty.inputs[].input uncertainty.inputs[].pointer uncertainty.inputs[].form uncertainty.inputs[].value
uncertainty.inputs[].spread uncertainty.inputs[].unit uncertainty.samples uncertainty.outside uncertainty.settled
`)

func decode(t testing.TB, a *regime.Answer) map[string]any {
	t.Helper()
	var doc map[string]any
	if err := json.Unmarshal(AppendJSON(nil, a, All), &doc); err != nil {
		t.Fatal(err)
	}
	return doc
}

func TestKeysAreTheContract(t *testing.T) {
	keys := map[string]bool{}
	for _, a := range answers(t) {
		keysOf(keys, "", decode(t, a))
	}
	for _, k := range contract {
		if !keys[k] {
			t.Errorf("%s is missing", k)
		}
	}
	for k := range keys {
		if !slices.Contains(contract, k) && !slices.Contains(seldom, k) {
			t.Errorf("%s is no part of the contract", k)
		}
	}
	if len(contract) < 90 {
		t.Errorf("the contract has only %d members", len(contract))
	}
}

// TestEverythingIsThere counts what every answer must have.
func TestEverythingIsThere(t *testing.T) {
	for name, a := range answers(t) {
		doc := decode(t, a)
		findings := doc["findings"].(map[string]any)
		if len(findings) != len(assumption.Catalogue) {
			t.Errorf("%s: %d findings of %d", name, len(findings), len(assumption.Catalogue))
		}
		for _, e := range assumption.Catalogue {
			f, ok := findings[e.ID].(map[string]any)
			if !ok {
				t.Fatalf("%s: no finding on %s", name, e.ID)
			}
			_, priced := f["estimate"]
			if f["verdict"] != a.Findings[e.Index()].Verdict.String() || priced == (f["verdict"] == "not-applicable") {
				t.Errorf("%s, %s: verdict %v, estimate %v", name, e.ID, f["verdict"], f["estimate"])
			}
		}
		groups := doc["groups"].(map[string]any)
		core := 0
		for id := range group.Count {
			if !group.Of(id).Core {
				continue
			}
			core++
			g, ok := groups[group.Of(id).ID].(map[string]any)
			if !ok {
				t.Fatalf("%s: no group %s", name, group.Of(id).ID)
			}
			if g["value"] == nil && g["because"] == nil {
				t.Errorf("%s, %s: neither a value nor a reason", name, group.Of(id).ID)
			}
		}
		if core != 6 {
			t.Errorf("%d core groups", core)
		}
		r := doc["recommendation"].(map[string]any)
		if r["class"] != a.Recommendation.Class.ID || len(r["axes"].(map[string]any)) != 11 {
			t.Errorf("%s: recommendation %v", name, r)
		}
		if len(r["rejected"].([]any)) != len(a.Recommendation.Rejected) || len(r["conditions"].([]any)) != len(a.Recommendation.Conditions) {
			t.Errorf("%s: rejected %v, conditions %v", name, r["rejected"], r["conditions"])
		}
	}
}

// sentencesOf gathers what is meant to be pasted into a report.
func sentencesOf(dst []string, doc map[string]any) []string {
	for _, f := range doc["findings"].(map[string]any) {
		f := f.(map[string]any)
		dst = append(dst, f["because"].(string))
		parts, _ := f["parts"].([]any)
		for _, p := range parts {
			dst = append(dst, p.(map[string]any)["because"].(string))
		}
	}
	for _, g := range doc["groups"].(map[string]any) {
		if s, ok := g.(map[string]any)["because"].(string); ok {
			dst = append(dst, s)
		}
	}
	r := doc["recommendation"].(map[string]any)
	for _, list := range []any{r["justification"], r["conditions"], doc["cautions"]} {
		for _, s := range list.([]any) {
			dst = append(dst, s.(string))
		}
	}
	for _, x := range r["rejected"].([]any) {
		dst = append(dst, x.(map[string]any)["sentence"].(string))
	}
	return dst
}

func checkSentence(t *testing.T, s string) {
	t.Helper()
	if !strings.HasSuffix(s, ".") || strings.HasSuffix(s, "..") || strings.HasSuffix(s, " .") {
		t.Errorf("ends without one full stop: %q", s)
	}
	for _, bad := range []string{"{", "}", "NaN", "Inf", "undefined", "infinite", "  ", ". ;", ".;", "; ;"} {
		if strings.Contains(s, bad) {
			t.Errorf("contains %q: %q", bad, s)
		}
	}
}

func TestSentences(t *testing.T) {
	n := 0
	for _, a := range answers(t) {
		for _, s := range sentencesOf(nil, decode(t, a)) {
			checkSentence(t, s)
			n++
		}
	}
	if n < 150 {
		t.Errorf("only %d sentences", n)
	}
}

// TestNumbersAreExact reads the figures back.
func TestNumbersAreExact(t *testing.T) {
	n := 0
	for name, a := range answers(t) {
		doc := decode(t, a)
		for id := range group.Count {
			if !a.Groups.Has(id) {
				continue
			}
			n++
			if got := doc["groups"].(map[string]any)[group.Of(id).ID].(map[string]any)["value"]; got != a.Groups.Get(id) {
				t.Errorf("%s, %s: %v, want %v", name, group.Of(id).ID, got, a.Groups.Get(id))
			}
		}
		for id := range scale.Count {
			if !a.Scales.Has(id) {
				continue
			}
			n++
			if got := doc["scales"].(map[string]any)[scale.Of(id).ID].(map[string]any)["value"]; got != a.Scales.X(id) {
				t.Errorf("%s, %s: %v, want %v", name, scale.Of(id).ID, got, a.Scales.X(id))
			}
		}
	}
	if n < 90 {
		t.Errorf("only %d numbers", n)
	}
}

func TestNumber(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		x := rapid.Float64().Draw(t, "x")
		out := number([]byte{'{'}, "x", x)[len(`{"x":`):]
		if !jsontext.Value(out).IsValid() {
			t.Fatalf("%v: %s", x, out)
		}
		if math.IsNaN(x) || math.IsInf(x, 0) {
			if string(out) != "null" {
				t.Fatalf("%v: %s", x, out)
			}
			return
		}
		if back, err := strconv.ParseFloat(string(out), 64); err != nil || back != x {
			t.Fatalf("%v became %s", x, out)
		}
	})
}

func TestTextIsEscaped(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := rapid.String().Draw(t, "s")
		out := text(nil, s)
		if !jsontext.Value(out).IsValid() {
			t.Fatalf("%q: %s", s, out)
		}
		back, err := jsontext.AppendUnquote(nil, out)
		if err != nil || string(back) != s {
			t.Fatalf("%q became %s", s, out)
		}
	})
	rows := 0
	for s, want := range map[string]string{
		"a\"b": `"a\"b"`, `a\b`: `"a\\b"`, "a\nb\tc": `"a\nb\tc"`, "\x1b[31m": `"\u001b[31m"`, "ζ_s": `"ζ_s"`,
		"long enough\x00for eight": `"long enough\u0000for eight"`, "no \xff UTF-8 here": "\"no \uFFFD UTF-8 here\"", "": `""`,
	} {
		rows++
		if got := string(text(nil, s)); got != want {
			t.Errorf("%q: %s, want %s", s, got, want)
		}
	}
	if rows != 8 {
		t.Errorf("%d rows", rows)
	}
}

func TestParseFields(t *testing.T) {
	all, err := ParseFields(nil)
	if err != nil || all != All {
		t.Errorf("nothing: %b, %v", all, err)
	}
	two, err := ParseFields([]string{" findings", "recommendation", ""})
	if err != nil || two != Findings|Recommendation {
		t.Errorf("two: %b, %v", two, err)
	}
	if got := keysAt(AppendJSON(nil, dry(t), two)); !slices.Equal(got, []string{"findings", "recommendation"}) {
		t.Errorf("members %v", got)
	}
	_, err = ParseFields([]string{"recomendation", "findings", "zzzzzzzzzzzz"})
	var unknown *UnknownFieldsError
	if !errors.As(err, &unknown) || !slices.Equal(unknown.Names, []string{"recomendation", "zzzzzzzzzzzz"}) {
		t.Fatalf("unknown: %v", err)
	}
	if !strings.Contains(err.Error(), "did you mean recommendation?") || !strings.Contains(err.Error(), "it has digest, engine") {
		t.Errorf("unknown: %v", err)
	}
	for i, name := range FieldNames() {
		if f, err := ParseFields([]string{name}); err != nil || f != 1<<i {
			t.Errorf("%s: %b, %v", name, f, err)
		}
	}
	if len(FieldNames()) != 17 || All != 1<<17-1 {
		t.Errorf("%d members, all is %b", len(FieldNames()), All)
	}
}

func keysAt(doc []byte) []string {
	var m map[string]json.RawMessage
	if json.Unmarshal(doc, &m) != nil {
		return nil
	}
	var keys []string
	for k := range m {
		keys = append(keys, k)
	}
	slices.Sort(keys)
	return keys
}

func TestCatalogueDigest(t *testing.T) {
	if d := Catalogue(); len(d) != 64 || d != Catalogue() {
		t.Errorf("digest %q", d)
	}
	// Lengths keep texts apart that read the same when put together.
	a, b := newLedger(), newLedger()
	a.text("ab", "c")
	b.text("a", "bc")
	if bytes.Equal(a.Sum(nil), b.Sum(nil)) {
		t.Error("two catalogues read the same")
	}
}
