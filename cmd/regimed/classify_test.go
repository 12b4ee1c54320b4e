package main

import (
	"fmt"
	"net/http"
	"net/http/httptest"
	"strings"
	"testing"

	"github.com/go-json-experiment/json/jsontext"

	"regimed/api"
)

// served asks the service itself.
func served(t *testing.T, method, path, body string) string {
	t.Helper()
	request := httptest.NewRequest(method, path, strings.NewReader(body))
	if body != "" {
		request.Header.Set("Content-Type", "application/json")
	}
	recorder := httptest.NewRecorder()
	api.New(api.Config{}).Handler().ServeHTTP(recorder, request)
	if recorder.Code != http.StatusOK {
		t.Fatalf("%s %s: %d %s", method, path, recorder.Code, recorder.Body)
	}
	return recorder.Body.String()
}

func TestClassifyIsWhatTheServiceAnswers(t *testing.T) {
	asJSON, asYAML := file(t, "pile.json", pileJSON), file(t, "pile.yaml", pileYAML)
	situation := file(t, "situation.yml", "title: A pile\nsource: invented\nexpect: [class=added-mass]\ncase:\n"+indent(pileYAML))
	want := served(t, http.MethodPost, "/v1/classify", pileJSON)
	trimmed := served(t, http.MethodPost, "/v1/classify?fields=kind,recommendation", pileJSON)
	unsure := strings.Replace(pileJSON, `"2 Hz"`, `"2 Hz +- 20 %"`, 1)
	spread := served(t, http.MethodPost, "/v1/classify", unsure)
	few := served(t, http.MethodPost, "/v1/classify?samples=100&what_if=false", unsure)
	point := served(t, http.MethodPost, "/v1/classify?what_if=false", pileJSON)
	rows := []struct {
		stdin string
		args  []string
		want  string
	}{
		{"", []string{asJSON}, want},
		{"", []string{asYAML}, want},
		{"", []string{situation}, want},
		{pileJSON, []string{"-"}, want},
		{pileYAML, []string{"-"}, want},
		{"", []string{asYAML, "--fields", "kind,recommendation"}, trimmed},
		{"", []string{asYAML, "--fields", "recommendation", "--fields", "kind"}, trimmed},
		{unsure, []string{"-"}, spread},
		{unsure, []string{"-", "--samples", "1024"}, spread},
		{unsure, []string{"-", "--samples", "100", "--what-if=false"}, few},
		{pileJSON, []string{"-", "--what-if=false"}, point},
	}
	ran := 0
	for _, row := range rows {
		got := regimed(row.stdin, append([]string{"classify", "--format", "json"}, row.args...)...)
		if got.status != statusMet || got.errOut != "" || got.out != row.want {
			t.Errorf("%v: status %d %s\ngot  %.300s\nwant %.300s", row.args, got.status, got.errOut, got.out, row.want)
		}
		ran++
	}
	if ran != 11 {
		t.Errorf("ran %d rows", ran)
	}
	if !strings.Contains(spread, `"uncertainty":{`) || len(few) >= len(spread) || len(point) >= len(want) {
		t.Errorf("the service answers %.200s", spread)
	}
	if v := jsontext.Value(want); !v.IsValid() || len(trimmed) >= len(want) {
		t.Errorf("the service answers %.200s", want)
	}
}

func indent(s string) string {
	return "  " + strings.ReplaceAll(strings.TrimSuffix(s, "\n"), "\n", "\n  ") + "\n"
}

func TestClassifyAsText(t *testing.T) {
	path := file(t, "pile.yaml", pileYAML)
	plain := regimed("", "classify", path)
	if plain.status != statusMet || plain.errOut != "" || jsontext.Value(plain.out).IsValid() || !strings.HasSuffix(plain.out, "\n") {
		t.Fatalf("got %+v", plain)
	}
	if again := regimed("", "classify", "--format", "text", path); again.out != plain.out {
		t.Error("text is not the default")
	}
	if strings.Contains(plain.out, "\x1b") {
		t.Error("colours without --colour")
	}
	if coloured := regimed("", "classify", "--colour", path); !strings.Contains(coloured.out, "\x1b[") {
		t.Error("no colours with --colour")
	}
	if narrow := regimed("", "classify", "--width", "72", path); narrow.out == plain.out {
		t.Error("--width changes nothing")
	}
}

// Numbers of samples that can't be are refused before anything is read.
func TestClassifyRefusesSamples(t *testing.T) {
	for _, n := range []string{"0", "63", "65537", "-1", "many"} {
		got := regimed("", "classify", "--samples", n, "never-read.yaml")
		if got.status != statusRefuse || got.out != "" || !strings.Contains(got.errOut, "samples") {
			t.Errorf("%s: %+v", n, got)
		}
	}
}

// Everything that is wrong is said at once, at its line, whatever the form.
func TestClassifyRefuses(t *testing.T) {
	badYAML := `structure:
  kind: cylinder
  diameter: 0.5 kg
  lenght: 20 m
  mass_per_length: 250 kg/m
  damping_ratio: .nan
  damping_ratio: 0.01
fluid: watter
nonsense/x: 1
`
	badJSON := `{"structure": {"kind": "cylinder", "diameter": "0.5 kg",
  "lenght": "20 m", "mass_per_length": "250 kg/m"},
  "fluid": {"name": "watter"}
}`
	rows := []struct {
		name, content string
		lines         []string // beginnings of what is said, without the name of the file
	}{
		{"bad.yaml", badYAML, []string{
			":3: /structure/diameter: wrong-dimension: ",
			":4: /structure/lenght: unknown-field: ",
			":6: /structure/damping_ratio: not-finite: ",
			":7: /structure/damping_ratio: duplicate: ",
			":8: /fluid: unknown-choice: ",
			":9: /nonsense~1x: unknown-field: ",
		}},
		{"bad.json", badJSON, []string{
			":1: /structure/diameter: wrong-dimension: ",
			":2: /structure/lenght: unknown-field: ",
			":3: /fluid/name: unknown-choice: ",
		}},
		{"in.yaml", "tilte: x\ncase:\n" + indent(badYAML), []string{
			":1: /tilte: unknown-field: ",
			":5: /case/structure/diameter: wrong-dimension: ",
			":6: /case/structure/lenght: unknown-field: ",
			":8: /case/structure/damping_ratio: not-finite: ",
			":9: /case/structure/damping_ratio: duplicate: ",
			":10: /case/fluid: unknown-choice: ",
			":11: /case/nonsense~1x: unknown-field: ",
		}},
		{"kind.json", "{\n\"fluid\": \"water\"\n}", []string{":1: /structure: missing: "}},
		{"cut.json", "{\"structure\":\n{\"kind\": ", []string{":2: The document is no valid JSON "}},
		{"more.json", "{}\n{}", []string{":2: The document is no valid JSON "}},
		{"list.json", "[1]", []string{":1: (whole): wrong-type: "}},
		{"tabs.yaml", "structure:\n\tkind: cylinder\n", []string{": The document is no valid YAML: line 2: "}},
		{"empty.yaml", "", []string{": The document is no valid YAML: the document is empty."}},
		{"large.json", strings.Repeat(" ", maxDocument+1), []string{": the document is larger than 1 MiB"}},
	}
	ran := 0
	for _, row := range rows {
		path := file(t, row.name, row.content)
		got := regimed("", "classify", path)
		if got.status != statusRefuse || got.out != "" {
			t.Errorf("%s: status %d, prints %q", row.name, got.status, got.out)
		}
		if err := beginWith(got.errOut, path, row.lines); err != nil {
			t.Errorf("%s: %v in\n%s", row.name, err, got.errOut)
		}
		ran++
	}
	if ran != 10 {
		t.Errorf("ran %d rows", ran)
	}
}

func beginWith(text, path string, beginnings []string) error {
	said := strings.Split(strings.TrimSuffix(text, "\n"), "\n")
	if len(said) != len(beginnings) {
		return fmt.Errorf("%d lines, want %d", len(said), len(beginnings))
	}
	for i, line := range said {
		if !strings.HasPrefix(line, path+beginnings[i]) {
			return fmt.Errorf("line %d, want it to begin with %q,", i+1, beginnings[i])
		}
	}
	return nil
}

// What contradicts itself is found after decoding, and has its place as well.
func TestClassifyLocatesContradictions(t *testing.T) {
	path := file(t, "bad.yaml", strings.Replace(pileYAML, "  damping_ratio: .01\n", "  damping_ratio: .01\n  log_decrement: 0.5\n", 1))
	got := regimed("", "classify", path)
	if got.status != statusRefuse || !strings.Contains(got.errOut, "/structure/") || !strings.Contains(got.errOut, ": contradiction: ") {
		t.Errorf("got %+v", got)
	}
}

// In braces and no JSON, a document may still be YAML.
func TestClassifyReadsFlowYAML(t *testing.T) {
	flow := `{structure: {kind: cylinder, diameter: 0.5 m, length: 20 m, mass_per_length: 250 kg/m, frequency_dry: 2 Hz, damping_ratio: 0.01},
 fluid: {name: water, temperature: 15 degC}, motion: {amplitude: 5 mm}, title: Steel pile in still water}`
	want := regimed(pileJSON, "classify", "-")
	got := regimed(flow, "classify", "-")
	if got.status != statusMet || got.out != want.out {
		t.Errorf("got %+v, want %+v", got, want)
	}
	broken := regimed(`{"structure": {"kind": "cylinder",, "diameter": [}`, "classify", "-")
	if broken.status != statusRefuse || !strings.HasPrefix(broken.errOut, "(standard input):1: The document is no valid JSON") {
		t.Errorf("got %+v", broken)
	}
}
