package main

import (
	"net/http/httptest"
	"strings"
	"testing"

	"regimed/api"
)

func TestCompareCommand(t *testing.T) {
	a := file(t, "a.json", pileJSON)
	b := file(t, "b.yaml", strings.Replace(pileYAML, "0.5 m", "0.25 m", 1))
	got := regimed("", "compare", a, b)
	if got.status != statusMet || got.errOut != "" {
		t.Fatalf("%+v", got)
	}
	for _, want := range []string{"Two cases compared: ", "  a  Steel pile in still water", "Groups distorted", "Groups kept", "frequency"} {
		if !strings.Contains(got.out, want) {
			t.Errorf("want %q in\n%s", want, got.out)
		}
	}
	if same := regimed(pileJSON, "compare", a, "-"); same.status != statusMet || !strings.Contains(same.out, " 0 distorted.") || !strings.Contains(same.out, "None.") {
		t.Errorf("against itself: %+v", same)
	}
	for _, line := range strings.Split(regimed("", "compare", "--width", "80", a, b).out, "\n") {
		if n := len([]rune(line)); n > 80 {
			t.Errorf("%d columns: %s", n, line)
		}
	}
	if plain, set := regimed("", "compare", a, b).out, regimed("", "compare", "--colour", a, b).out; strings.Contains(plain, "\x1b") || !strings.Contains(set, "\x1b[1m") {
		t.Error("colours")
	}
}

// The command prints what the service answers, byte for byte.
func TestCompareAsTheService(t *testing.T) {
	a, b := file(t, "a.json", pileJSON), file(t, "b.json", strings.Replace(pileJSON, "0.5 m", "0.25 m", 1))
	r := httptest.NewRequest("POST", "/v1/compare", strings.NewReader(`{"a": `+pileJSON+`, "b": `+strings.Replace(pileJSON, "0.5 m", "0.25 m", 1)+`, "tolerance": 0.1}`))
	r.Header.Set("Content-Type", "application/json")
	w := httptest.NewRecorder()
	api.New(api.Config{}).Handler().ServeHTTP(w, r)
	if got := regimed("", "compare", "--format", "json", "--tolerance", "0.1", a, b); got.out != w.Body.String() || got.status != statusMet {
		t.Errorf("%+v\n%s", got, w.Body)
	}
}

func TestCompareRefuses(t *testing.T) {
	a := file(t, "a.json", pileJSON)
	bad := file(t, "bad.json", `{"structure": {"kind": "cylinder", "diameter": "1 kg"}}`)
	rows := []struct {
		args []string
		says []string
	}{
		{[]string{"compare", a}, []string{"name two files"}},
		{[]string{"compare", "-", "-"}, []string{"only one"}},
		{[]string{"compare", bad, "none.json"}, []string{"bad.json:1: /structure/diameter: wrong-dimension", "none.json: no such file"}},
		{[]string{"compare", "--format", "xml", a, a}, []string{"no format"}},
		{[]string{"compare", "--tolerance", "2", a, a}, []string{"between 0 and 1"}},
		{[]string{"compare", "--tolerance", "NaN", a, a}, []string{"between 0 and 1"}},
	}
	ran := 0
	for _, row := range rows {
		got := regimed("", row.args...)
		for _, want := range row.says {
			if got.status != statusRefuse || got.out != "" || !strings.Contains(got.errOut, want) {
				t.Errorf("%v: %+v, want %q", row.args, got, want)
			}
		}
		ran++
	}
	if ran != 6 {
		t.Errorf("%d rows", ran)
	}
}
