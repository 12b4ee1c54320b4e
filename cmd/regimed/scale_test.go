package main

import (
	"net/http/httptest"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"

	"regimed/api"
)

// current is a steel pile in a current.
const current = `title: Pile of the landing stage
structure: {kind: cylinder, diameter: 1.2 m, length: 18 m, wall_thickness: 20 mm, material: steel, support: clamped-free}
fluid: {name: water, temperature: 10 degC}
flow: {speed: 0.8 m/s}
`

func TestScale(t *testing.T) {
	f := file(t, "pile.yaml", current)
	got := regimed("", "scale", f, "--length", "1:40", "--keep", "froude,cauchy")
	if got.status != statusMet || got.errOut != "" {
		t.Fatalf("%+v", got)
	}
	for _, want := range []string{"Model 1:40 that keeps Froude number and Cauchy number.", "λ^(1/2)", "λ^5", "structure.diameter", "30.0 mm", "Kept, as judged", "Model against prototype: ", "Reynolds number, 253 times smaller"} {
		if !strings.Contains(got.out, want) {
			t.Errorf("want %q in\n%s", want, got.out)
		}
	}
	got = regimed("", "scale", f, "--length", "1:40", "--keep", "froude", "--keep", "reynolds")
	for _, want := range []string{"exclude each other", "kinematic viscosity 253 times smaller than it is", "gravity 64000 times larger", "length at 1:1"} {
		if got.status != statusUnmet || !strings.Contains(got.out, want) {
			t.Errorf("status %d, want %q in\n%s", got.status, want, got.out)
		}
	}
	for _, args := range [][]string{{"--keep", "froude,reynolds"}, {"--keep", "bond"}, {"--keep", "froude,weber,mach", "--fluid", "air"}} {
		for _, line := range strings.Split(regimed("", append([]string{"scale", f, "--width", "80", "--length", "1:40"}, args...)...).out, "\n") {
			if n := len([]rune(line)); n > 80 {
				t.Errorf("%d columns: %s", n, line)
			}
		}
	}
}

// The case of the model can be fed back; in JSON the command is the service.
func TestScaleFormats(t *testing.T) {
	f := file(t, "pile.yaml", current)
	model := regimed("", "scale", f, "--length", "0.025", "--keep", "froude", "--fluid", "{name: water, temperature: 18 degC}", "--format", "case")
	if model.status != statusMet || !strings.Contains(model.out, "  \"fluid\": {\n    \"name\": \"water\",\n    \"temperature\": \"291.15 K\"\n  }") {
		t.Fatalf("%+v", model)
	}
	answer := regimed(model.out, "classify", "--format", "json", "--fields", "digest", "-")
	var a struct{ Digest string }
	var s struct {
		Comparison struct{ B struct{ Digest string } }
	}
	got := regimed("", "scale", f, "--length", "0.025", "--keep", "froude", "--fluid", "{name: water, temperature: 18 degC}", "--format", "json")
	if err := json.Unmarshal([]byte(got.out), &s, json.MatchCaseInsensitiveNames(true)); err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal([]byte(answer.out), &a, json.MatchCaseInsensitiveNames(true)); err != nil || a.Digest != s.Comparison.B.Digest {
		t.Errorf("%v: %s and %s", err, a.Digest, s.Comparison.B.Digest)
	}
	made, _, _, err := yamlToJSON([]byte(current))
	if err != nil {
		t.Fatal(err)
	}
	r := httptest.NewRequest("POST", "/v1/scale", strings.NewReader(`{"case": `+string(made)+`, "length": 0.025, "keep": ["froude"], "fluid": {"name": "water", "temperature": "18 degC"}}`))
	r.Header.Set("Content-Type", "application/json")
	w := httptest.NewRecorder()
	api.New(api.Config{}).Handler().ServeHTTP(w, r)
	if got.out != w.Body.String() {
		t.Errorf("the command:\n%s\nthe service:\n%s", got.out, w.Body)
	}
	none := regimed(`{"structure": {"kind": "generic", "length": "1 m"}, "fluid": "water", "flow": {"speed": "10 m/s"}, "surroundings": {"depth_below_surface": "9 m"}}`,
		"scale", "-", "--length", "20:1", "--speed", "1", "--keep", "cavitation", "--format", "case")
	if none.status != statusUnmet || !strings.Contains(none.errOut, "/surroundings/ambient_pressure: out-of-range") {
		t.Errorf("no case: %+v", none)
	}
}

func TestScaleRefuses(t *testing.T) {
	f := file(t, "pile.yaml", current)
	bad := file(t, "bad.yaml", "structure:\n  kind: cylinder\n  diameter: 1 kg\n")
	broken := file(t, "broken.json", `{"structure": `)
	rows := []struct {
		args []string
		says []string
	}{
		{[]string{"scale"}, []string{"name one file"}},
		{[]string{"scale", f, "--keep", "mach"}, []string{"--length: missing"}},
		{[]string{"scale", f, "--length", "1:x", "--keep", "froud,drag_coefficient", "--free", "speed"}, []string{"--length: wrong-type", "--keep: unknown-choice: No group is called \"froud\". Did you mean froude?", "drag_coefficient is no product", "--free: unknown-choice"}},
		{[]string{"scale", f, "--length", "1:2", "--kinematic-viscosity", "1:0"}, []string{"--kinematic-viscosity: wrong-type"}},
		{[]string{"scale", f, "--length", "1:2", "--fluid", "wodka"}, []string{"--fluid: unknown-choice"}},
		{[]string{"scale", f, "--length", "1:2", "--fluid", "{name: [}"}, []string{"--fluid is a name"}},
		{[]string{"scale", f, "--length", "1:2", "--tolerance", "7"}, []string{"--tolerance is a number between 0 and 1"}},
		{[]string{"scale", f, "--length", "1:2", "--tolerance", "NaN"}, []string{"--tolerance is a number"}},
		{[]string{"scale", f, "--length", "1:2", "--format", "yaml"}, []string{"no format is called \"yaml\": text, json or case"}},
		{[]string{"scale", bad, "--length", "1:2", "--keep", "x"}, []string{"bad.yaml:3: /structure/diameter: wrong-dimension", "--keep: unknown-choice"}},
		{[]string{"scale", broken, "--length", "1:2"}, []string{"broken.json:1: The document is no valid JSON"}},
		{[]string{"scale", "none.json", "--length", "1:2"}, []string{"none.json: no such file"}},
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
	if ran != 12 {
		t.Errorf("%d rows", ran)
	}
	for _, row := range []struct {
		args []string
		want string
	}{{[]string{"scale", "--keep", ""}, "froude"}, {[]string{"scale", "--free", ""}, "fluid"}, {[]string{"scale", "--fluid", ""}, "seawater"}, {[]string{"compare", "--format", ""}, "json"}} {
		if got := regimed("", append([]string{"__complete"}, row.args...)...); !strings.Contains("\n"+got.out, "\n"+row.want+"\n") {
			t.Errorf("%v: %q", row.args, got.out)
		}
	}
}
