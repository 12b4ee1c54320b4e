package page_test

import (
	"fmt"
	"os/exec"
	"strings"
	"testing"

	"github.com/go-json-experiment/json"
)

// What the page does with numbers and texts by itself: expression, result.
var expressions = []struct{ module, expression, want string }{
	// A slider multiplies what was typed, the unit and the form of its uncertainty kept.
	{"quantity", `m.scaled("300 mm", 2)`, "600 mm"},
	{"quantity", `m.scaled("12 ksi", 1.25, 3)`, "15 ksi"},
	{"quantity", `m.scaled("2.1 +- 0.2 m/s", 10)`, "21 +- 2 m/s"},
	{"quantity", `m.scaled("2.1±0.2 m/s", 3)`, "6.3±0.6 m/s"},
	{"quantity", `m.scaled("2.1 m/s +- 10 %", 10)`, "21 m/s +- 10 %"},
	{"quantity", `m.scaled("5 % +- 1 %", 2)`, "10 % +- 2 %"},
	{"quantity", `m.scaled("1.8 .. 2.4 m/s", 2)`, "3.6 .. 4.8 m/s"},
	{"quantity", `m.scaled("1e-6 m2/s", 2)`, "2e-6 m2/s"},
	{"quantity", `m.scaled("10 degC", 1.1)`, "38.315 degC"},
	{"quantity", `m.scaled("50 °F +- 2 °F", 1.02)`, "60.193 °F +- 2.04 °F"},
	{"quantity", `m.scaled("0.004", 3.3)`, "0.0132"},
	{"quantity", `m.scaled("many", 2)`, "many"},
	{"quantity", `m.scaled("4.2 barg", 2, 4, 1.013)`, "9.413 barg"}, // from no pressure at all
	{"quantity", `m.ends([1, 2, 3]) + "," + m.ends([2, 2, 2]) + "," + m.ends(undefined) + "," + m.ends([null, null, null])`, "1 … 3,,,"},
	{"quantity", `m.leading("−3.5e2 m")`, "-350"},
	{"quantity", `m.isNumber("1e400")`, "false"},
	{"quantity", `m.isNumber(" .5 ")`, "true"},
	{"quantity", `m.textOf({value: 2, std: 0.1, unit: "m"})`, "2 +- 0.1 m"},
	{"quantity", `m.textOf({low: 1, high: 2, unit: "m/s"})`, "1 .. 2 m/s"},
	{"quantity", `m.textOf({low: 1, high: 2, unit: "m/s", as: "range"})`, `{"low":1,"high":2,"unit":"m/s","as":"range"}`},
	{"quantity", `m.shown(1.2345e-6)`, "1.23×10⁻⁶"},
	{"quantity", `m.shown(-0.5)`, "−0.5"},
	{"quantity", `m.shown(null)`, "–"},
	{"quantity", `m.quantityShown(5.69e-5, "m")`, "56.9 µm"},
	{"quantity", `m.quantityShown(0.99996, "m")`, "1 m"},
	{"quantity", `m.quantityShown(2.1e11, "Pa")`, "210 GPa"},
	{"quantity", `m.quantityShown(1026.3, "kg/m3", 4)`, "1026 kg/m³"},
	{"quantity", `m.times(1e-9) + " " + m.times(2) + " " + m.times(1e9)`, "< 0.001 2 > 10⁴"},
	{"quantity", `m.share(0.001) + ", " + m.share(0.5) + ", " + m.share(0.999)`, "< 1 %, 50 %, > 99 %"},
	// What was typed becomes a number only where the field is one.
	{"form", `JSON.stringify(m.valueOf({type: "quantity", isNumber: true}, " 0.05 "))`, "0.05"},
	{"form", `JSON.stringify(m.valueOf({type: "quantity"}, "0.05"))`, `"0.05"`},
	{"form", `JSON.stringify(m.valueOf({type: "integer"}, "3"))`, "3"},
	{"form", `JSON.stringify(m.valueOf({type: "text"}, "3"))`, `"3"`},
	{"form", `JSON.stringify(m.valueOf({type: "quantity"}, '{"value": 2, "unit": "m"}'))`, `{"value":2,"unit":"m"}`},
	{"form", `JSON.stringify(m.valueOf({type: "quantity"}, "{2 m"))`, `"{2 m"`},
	{"form", `m.valueOf({type: "quantity"}, "  ")`, "undefined"},
	// Places in a case.
	{"case", `JSON.stringify((() => { const k = {}; m.set(k, "/structure/modes/0/damping_ratio", 1); m.set(k, "/a~1b/c~0d", 2); return k; })())`, `{"structure":{"modes":[{"damping_ratio":1}]},"a/b":{"c~d":2}}`},
	{"case", `JSON.stringify((() => { const k = {flow: {operating: ["1 m/s"]}, x: 1}; m.remove(k, "/flow/operating/0"); return k; })())`, `{"x":1}`},
	{"case", `JSON.stringify((() => { const k = {}; m.set(k, "/__proto__/x", 1); return [Object.keys(k), ({}).x === undefined]; })())`, `[["__proto__"],true]`},
	{"case", `m.get({a: "text"}, "/a/length")`, "undefined"},
	{"case", `m.fromLink(m.toLink({title: "Ø ½ 水 \u{1f30a}?>"})).title`, "Ø ½ 水 \U0001f30a?>"},
	{"case", `/^[\w-]*$/.test(m.toLink({title: "Ø ½ 水 ???>>>"}))`, "true"},
	{"case", `JSON.stringify(m.fromText('\uFEFF{"case": {"title": "x"}, "expect": []}'))`, `{"title":"x"}`},
}

func TestExpressions(t *testing.T) {
	p := open(t, "/", wide)
	for _, row := range expressions {
		if got := p.text(fmt.Sprintf(`import("/sheet/%s.js").then((m) => %s)`, row.module, row.expression)); got != row.want {
			t.Errorf("%s is %s, wanted %s", row.expression, got, row.want)
		}
	}
	if len(expressions) != 43 {
		t.Errorf("%d rows", len(expressions))
	}
}

// The line for a shell holds the case whatever is in it; the table for a wiki
// stays a table.
func TestCopies(t *testing.T) {
	p := open(t, "/", wide)
	p.example("mast")
	title := "it's | a `case`\\ $(of) *two*"
	p.text(fmt.Sprintf(`(() => { const f = document.querySelector("#f-title"); f.value = %q; f.dispatchEvent(new Event("input")); })()`, title))
	p.until(fmt.Sprintf(`document.title.startsWith(%q) && !document.querySelector("#answer-body").hasAttribute("aria-busy")`, title))
	take := func(name string) string {
		p.text(`document.querySelector("#copied").value = ""`)
		p.text(fmt.Sprintf(`document.querySelector("#copy-%s").click()`, name))
		p.until(`document.querySelector("#copied").value`)
		return p.text(`document.querySelector("#copied").value`)
	}

	out, err := exec.Command("sh", "-c", `curl() { printf '%s\n' "$@"; }; `+take("curl")).Output()
	p.must(err)
	words := strings.Split(strings.TrimSpace(string(out)), "\n")
	if len(words) != 6 || words[2] != "Content-Type: application/json" || words[5] != p.base+"/v1/classify" {
		t.Fatalf("%q", words)
	}
	var kase struct {
		Title string `json:"title"`
	}
	p.must(json.Unmarshal([]byte(words[4]), &kase))
	if kase.Title != title {
		t.Errorf("the line holds the title %q", kase.Title)
	}
	if p.digest(words[4]) == "" {
		t.Error("the service does not answer the line")
	}

	lines := strings.Split(strings.TrimSpace(take("markdown")), "\n")
	for _, line := range lines[:len(lines)-2] {
		if bars := strings.Count(line, "|") - strings.Count(line, `\|`); bars != 3 {
			t.Errorf("%d bars in %q", bars, line)
		}
	}
	if !strings.Contains(strings.Join(lines, "\n"), `it's \| a \`+"`case") {
		t.Errorf("the title is not in %q", lines[2])
	}
	if last := lines[len(lines)-1]; !strings.HasPrefix(last, "[The case]("+p.base+"/#case=") {
		t.Errorf("%q", last)
	}
}

// A service that does not answer is told, and the next answer takes that away.
func TestNoService(t *testing.T) {
	p := open(t, "/", wide)
	p.example("mast")
	p.text(`(() => { const ask = window.fetch; window.fetch = async () => { window.fetch = ask; throw new TypeError("gone"); }; })()`)
	typeTitle := func(text string) {
		p.text(fmt.Sprintf(`(() => { const f = document.querySelector("#f-title"); f.value = %q; f.dispatchEvent(new Event("input")); })()`, text))
	}
	typeTitle("one")
	p.state("failed")
	if got := p.text(`document.querySelector("#message").textContent`); !strings.Contains(got, "can’t be reached") {
		t.Errorf("%q", got)
	}
	typeTitle("two")
	p.answered()
	p.until(`document.querySelector("#message").hidden && document.querySelector("#stale").hidden`)
}
