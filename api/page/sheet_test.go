package page_test

import (
	"fmt"
	"net/http"
	"path/filepath"
	"strings"
	"testing"

	"github.com/chromedp/chromedp/kb"
	"github.com/go-json-experiment/json"
)

const wide, narrow = 1280, 320

// A case is built from nothing with the keyboard alone: a kind is picked, inputs
// are typed, a mistake is shown where it is and goes away, an input is added from
// the search box, a slider shows another class, and the case is taken away.
func TestByKeyboard(t *testing.T) {
	p := open(t, "/", wide)
	p.state("empty")
	p.tabTo("input[name=kind]")
	p.keys(kb.ArrowRight)
	p.until(`document.querySelector("input[name=kind]:checked")?.value === "cylinder"`)
	p.keys(kb.Enter)
	p.until(`document.activeElement.id === "f-structure-diameter"`)
	p.state("refused")
	if got := p.text(`document.querySelectorAll("[aria-invalid]").length`); got != "0" {
		t.Errorf("%s inputs are called wrong before anything was typed", got)
	}

	p.keys("3 kg")
	p.until(`document.activeElement.getAttribute("aria-invalid") === "true"`)
	described := `document.activeElement.getAttribute("aria-describedby").split(" ").map((id) => document.getElementById(id).textContent).join(" ")`
	if got := p.text(described); !strings.Contains(got, "kg is the unit of a mass, not of a length") || !strings.Contains(got, "Outer diameter") {
		t.Errorf("the input is described by %q", got)
	}
	if got := p.text(`document.querySelector("#trouble").innerText`); !strings.Contains(got, "1 input needs attention") {
		t.Errorf("the summary says %q", got)
	}
	p.fill("f-structure-diameter", "300 mm")
	p.fill("f-structure-length", "40 m")
	p.answered()
	p.until(`!document.querySelector("[aria-invalid]") && document.querySelector("#trouble").hidden`)
	p.fill("f-structure-damping_ratio", "0.5 %")
	p.until(`document.activeElement.value === "0.5 %"`)

	// From the search box.
	p.add("mass per length", "f-structure-mass_per_length")
	p.keys("180 kg/m")
	p.add("natural frequency without", "f-structure-frequency_dry")
	p.keys("1.2 Hz")
	p.tabTo("#f-fluid-name")
	p.keys("sea")
	p.tabTo("#f-flow-speed")
	p.keys("1.1 m/s")
	p.until(`document.querySelector("#part-numbers")?.innerText.includes("shedding")`)
	class := p.text(`document.querySelector("#class code").textContent`)
	if got := p.text(`document.querySelector("#say").textContent`); !strings.HasPrefix(got, "Recommended: ") || !strings.HasPrefix(p.text(`document.querySelector("#class").textContent`), got[len("Recommended: "):len(got)-1]) {
		t.Errorf("who listens hears %q", got)
	}

	// A slider, by the contents of the answer.
	p.tabTo(".contents a[href='#part-whatif']")
	p.keys(kb.Enter)
	p.until(`document.activeElement.id === "part-whatif"`)
	p.tabTo("#if-flow-speed")
	p.keys(kb.Home)
	p.until(`document.querySelector("#if-flow-speed-class").classList.contains("turned")`)
	if got := p.text(`document.querySelector("#if-flow-speed").getAttribute("aria-valuetext")`); !strings.HasPrefix(got, "0.11 m/s, then ") {
		t.Errorf("the slider says %q", got)
	}
	if got := p.text(`document.querySelector("#class code").textContent`); got != class {
		t.Errorf("the case itself became %s", got)
	}
	p.tabTo("#part-whatif .use:not([hidden])")
	p.keys(kb.Enter)
	p.until(fmt.Sprintf(`document.querySelector("#f-flow-speed").value === "0.11 m/s" && document.querySelector("#class code").textContent !== %q`, class))

	// Taken away, it is a case that the service answers alike.
	p.text(`document.querySelector("#case").focus()`)
	p.tabTo(".contents a[href='#part-copies']")
	p.keys(kb.Enter)
	p.tabTo("#copy-json")
	p.keys(kb.Enter)
	p.until(`document.querySelector("#copied")?.value`)
	copied := p.text(`document.querySelector("#copied").value`)
	if digest := p.digest(copied); !strings.HasPrefix(digest, p.shownDigest()) {
		t.Errorf("the digest shown is %s, of the copied case %s", p.shownDigest(), digest)
	}
	for _, part := range []string{`"diameter": "300 mm"`, `"damping_ratio": "0.5 %"`, `"name": "seawater"`, `"speed": "0.11 m/s"`, `"kind": "cylinder"`} {
		if !strings.Contains(copied, part) {
			t.Errorf("no %s in %s", part, copied)
		}
	}
}

// add looks for an input in the search box and adds the first one found, which
// has the focus then.
func (p *tab) add(words, id string) {
	p.t.Helper()
	p.text(`document.querySelector("#case").focus()`)
	p.tabTo("#add")
	p.keys(words)
	p.until(`document.querySelector("#adder-list [aria-selected=true]")`)
	p.keys(kb.Enter)
	p.until(fmt.Sprintf(`document.activeElement.id === %q`, id))
}

// shownDigest is the beginning of the digest of the case, as the page shows it.
func (p *tab) shownDigest() string {
	p.t.Helper()
	return p.text(`document.querySelector("#part-numbers > p code").textContent`)
}

// digest asks the service for the digest of a case.
func (p *tab) digest(kase string) string {
	p.t.Helper()
	r, err := http.Post(p.base+"/v1/classify?fields=digest", "application/json", strings.NewReader(kase))
	p.must(err)
	defer r.Body.Close()
	var answer struct {
		Digest string `json:"digest"`
	}
	p.must(json.UnmarshalRead(r.Body, &answer))
	if r.StatusCode != http.StatusOK || answer.Digest == "" {
		p.t.Fatalf("status %d for %s", r.StatusCode, kase)
	}
	return answer.Digest
}

// Every demo case comes back from its link as it was, in a browser that has
// never seen it. All are opened; the service says whether they are the same.
func TestLinks(t *testing.T) {
	p := open(t, "/", wide)
	names := strings.Split(p.text(`[...document.querySelectorAll("#example optgroup option")].map((o) => o.value).join(" ")`), " ")
	for _, name := range names {
		p.example(name)
		p.until(`location.hash.startsWith("#case=")`)
		copied := p.text(`import("/sheet/case.js").then((m) => JSON.stringify(m.fromLink(location.hash.slice(6))))`)
		original := p.text(fmt.Sprintf(`fetch("/examples.json").then((r) => r.json()).then((l) => JSON.stringify(l.examples.find((e) => e.name === %q).case))`, name))
		if p.digest(copied) != p.digest(original) {
			t.Errorf("%s: the link holds another case: %s", name, copied)
		}
		if left := p.text(`document.querySelectorAll("[aria-labelledby=strangers]").length`); left != "0" {
			t.Errorf("%s: inputs that the sheet does not know", name)
		}
	}
	if len(names) < 45 {
		t.Errorf("%d cases", len(names))
	}

	p.example("dolphin-pile")
	p.text(`document.querySelector("#copy-link").click()`)
	p.until(`document.querySelector("#copied").value`)
	link := p.text(`document.querySelector("#copied").value`)
	other := newTab(t, p.base, strings.TrimPrefix(link, p.base), wide)
	other.answered()
	if one, two := p.shownDigest(), other.shownDigest(); one != two {
		t.Errorf("digest %s, in the other tab %s", one, two)
	}
	values := `[...document.querySelectorAll("#fields input, #fields select")].map((e) => e.id + "=" + e.value).join("\n")`
	if one, two := p.text(values), other.text(values); one != two {
		t.Errorf("the inputs differ:\n%s\n\n%s", one, two)
	}
}

// A link that is cut short says so, and leaves an empty sheet.
func TestBrokenLink(t *testing.T) {
	p := open(t, "/#case=eyJz", wide)
	p.state("empty")
	if got := p.text(`document.querySelector("#message").textContent`); !strings.Contains(got, "no case that can be read") {
		t.Errorf("%q", got)
	}
}

func TestKindInAddress(t *testing.T) {
	p := open(t, "/?kind=plate", wide)
	p.until(`document.querySelector("#f-structure-thickness")`)
	if got := p.text(`document.querySelector("input[name=kind]:checked").value`); got != "plate" {
		t.Error(got)
	}
}

// What someone types or pastes never becomes anything but text.
func TestTextStaysText(t *testing.T) {
	p := open(t, "/", wide)
	attack := `<img src=x onerror="document.title='taken'"><script>document.title='taken'</script>`
	kase, err := json.Marshal(map[string]any{
		"title": attack, attack: attack, "__proto__x": 1, "fluid": map[string]any{"name": attack, attack: 1},
		"structure": map[string]any{"kind": "plate", "length": attack, "width": "1 m", attack: attack}})
	p.must(err)
	p.text(fmt.Sprintf(`(() => { document.querySelector("#paste").value = %q; document.querySelector("#paste-read").click(); })()`, kase))
	p.state("refused")
	p.until(`document.querySelector("#trouble").innerText.includes("onerror")`)
	if got := p.text(`document.querySelectorAll("main img, main script").length + " " + document.title.startsWith("taken")`); got != "0 false" {
		t.Error(got)
	}
	if got := p.text(`document.querySelector("#f-title").value`); got != attack {
		t.Errorf("the title is %q", got)
	}
	// What the sheet does not know is listed, and can be taken out.
	p.text(`[...document.querySelectorAll("[aria-labelledby=strangers] button")].forEach((b) => b.click())`)
	p.until(`!document.querySelector("#trouble").innerText.includes("No field is called")`)
}

// Changing the kind keeps what the new one has too, and brings the rest back
// with the old one.
func TestChangeOfKind(t *testing.T) {
	p := open(t, "/", wide)
	p.example("sluice-skin")
	pick := func(kind string) {
		p.text(fmt.Sprintf(`document.querySelector("input[name=kind][value=%s]").click()`, kind))
	}
	pick("film")
	p.until(`document.querySelector("#f-structure-gap")`)
	if got := p.text(`document.querySelector("#message").textContent`); !strings.Contains(got, "edges") || !strings.Contains(got, "wetted_sides") {
		t.Errorf("%q", got)
	}
	if got := p.text(`document.querySelector("#f-structure-length").value`); got != "0.75 m" {
		t.Errorf("length %q", got)
	}
	before := p.digest(p.text(`fetch("/examples.json").then((r) => r.json()).then((l) => JSON.stringify(l.examples.find((e) => e.name === "sluice-skin").case))`))
	pick("plate")
	p.answered()
	p.until(fmt.Sprintf(`document.querySelector("#part-numbers > p code").textContent === %q`, before[:12]))
}

// Clear empties the sheet, and Undo brings the case back.
func TestClearAndUndo(t *testing.T) {
	p := open(t, "/", wide)
	p.example("mast")
	digest := p.shownDigest()
	p.text(`document.querySelector("#clear").click()`)
	p.state("empty")
	p.until(`location.hash === ""`)
	p.text(`document.querySelector("#undo").click()`)
	p.answered()
	if got := p.shownDigest(); got != digest {
		t.Errorf("%s, before %s", got, digest)
	}
}

// Several modes are rows that can be added, filled and taken out.
func TestModes(t *testing.T) {
	p := open(t, "/?kind=plate", wide)
	p.fill("f-structure-length", "1 m")
	p.fill("f-structure-width", "1 m")
	p.fill("f-structure-thickness", "10 mm")
	p.text(`(() => { const add = document.querySelector("#add"); add.focus(); add.value = "several modes"; add.dispatchEvent(new Event("input")); })()`)
	p.keys(kb.Enter)
	p.until(`document.activeElement.closest("[data-pointer='/structure/modes']")`)
	p.keys(kb.Enter) // the button that adds a mode
	p.until(`document.activeElement.id === "f-structure-modes-0-frequency_dry"`)
	p.keys("12 kg")
	p.until(`document.activeElement.getAttribute("aria-invalid") === "true" && document.querySelectorAll("[aria-invalid]").length === 1`)
	p.fill("f-structure-modes-0-frequency_dry", "12 Hz")
	p.text(`document.querySelector("#f-structure-modes > button").click()`)
	p.fill("f-structure-modes-1-frequency_dry", "31 Hz")
	p.until(`document.querySelector("#f-structure-modes-1-frequency_dry").value === "31 Hz"`)
	p.text(`document.querySelector("#f-structure-modes .item button").click()`)
	p.until(`document.querySelector("#f-structure-modes-0-frequency_dry").value === "31 Hz" && !document.querySelector("#f-structure-modes-1-frequency_dry")`)
}

// uncertain is a demo case with a length around the one at which its class turns.
const uncertain = `(async () => {
	const kase = (await (await fetch("/examples.json")).json()).examples.find((e) => e.name === "outfall-span").case;
	kase.structure.length = "17.5 +- 1 m";
	document.querySelector("#paste").value = JSON.stringify(kase);
	document.querySelector("#paste-read").click();
})()`

// The uncertainty of an input makes each class probable in so far; the numbers
// are those of the service.
func TestProbabilities(t *testing.T) {
	p := open(t, "/", wide)
	p.text(uncertain)
	p.until(`document.querySelector(".chances")`)
	p.answered()
	chances := p.text(`document.querySelector(".chances").innerText.replaceAll("\n", " ")`)
	for _, part := range []string{"Added mass from potential flow 56 % Wake oscillator 44 %", "From 1024 draws of structure.length; standard error 0.19 % at most."} {
		if !strings.Contains(chances, part) {
			t.Errorf("no %q in %q", part, chances)
		}
	}
	about := p.text(`document.querySelector("#about-no-lock-in").textContent`)
	for _, part := range []string{"marginal 54 %, invalid 44 %", "; error over limit 0.928 … 1.35 (5 to 95 %).", "Driven by structure.length (to the power "} {
		if !strings.Contains(about, part) {
			t.Errorf("no %q in %q", part, about)
		}
	}
	if got := p.text(`document.querySelector("#part-numbers").innerText.includes("5 to 95 %")`); got != "true" {
		t.Error("no group has its quantiles")
	}
	if got := p.text(`document.querySelector("#part-whatif .slider input").id`); got != "if-structure-length" {
		t.Errorf("the first slider is %s, and not that of the nearest turn", got)
	}
}

// Turning points become marks of the sliders. One that is picked moves its slider
// there, and the service answers with the class that the turn has named: with a
// temperature and a gauge pressure too, which count from no zero.
func TestTurningPoints(t *testing.T) {
	p := open(t, "/", wide)
	ran := 0
	for _, name := range []string{"outfall-span", "damper-membrane", "lock-main", "thrust-plate"} {
		p.example(name)
		p.text(`document.querySelector("#more-sliders") && (document.querySelector("#more-sliders").open = true)`)
		if marks, turns := p.text(`document.querySelectorAll("#part-whatif .turn-marks path").length`), p.text(`document.querySelectorAll("#part-whatif .turns button").length`); marks != turns || marks < "2" {
			t.Errorf("%s: %s marks for %s turns", name, marks, turns)
		}
		var count int
		p.must(json.Unmarshal([]byte(p.text(`document.querySelectorAll("#part-whatif .turns button").length`)), &count))
		for i := range count {
			turn := fmt.Sprintf(`document.querySelectorAll("#part-whatif .turns button")[%d]`, i)
			p.text(turn + `.click()`)
			slider := turn + `.closest(".slider")`
			outcome := slider + `.querySelector(".outcome")`
			p.until(fmt.Sprintf(`%s.dataset.value === %s.querySelector(".value").textContent`, outcome, slider))
			told := p.text(turn + `.parentElement.textContent`)
			if got := strings.TrimPrefix(p.text(outcome+`.textContent`), "then "); !strings.Contains(told, " "+got+" (") {
				t.Errorf("%s: %q comes to %q", name, told, got)
			}
			ran++
		}
	}
	if ran < 18 {
		t.Errorf("%d turns", ran)
	}
}

// Where no slider can show a turn it is told; where the service has no time to
// look for turns the answer stands without.
func TestTurnsWithoutSlider(t *testing.T) {
	p := open(t, "/", wide)
	p.text(`(() => {
		const ask = window.fetch;
		window.fetch = async (path, options) => {
			const r = await ask(path, options);
			if (path !== "/v1/classify" || !r.ok) return r;
			if (window.late) return new Response(JSON.stringify({type: "/problems/answer-took-too-long", title: "x", status: 503, detail: "y"}), {status: 503});
			const a = await r.json();
			a.turning_points.push({input: "motion.amplitude", pointer: "/motion/amplitude", direction: "up", value: 0.25, unit: "m", factor: null, finding: "small-stroke", verdict: "invalid", class: "two-way-implicit", sentence: "."});
			return new Response(JSON.stringify(a));
		};
	})()`)
	p.example("outfall-span")
	if told := p.text(`document.querySelector("#part-whatif").innerText`); !strings.Contains(told, "motion.amplitude above 250 mm: Two-way, implicit") {
		t.Errorf("a turn without a factor is lost: %s", told)
	}
	p.text(`(() => { window.late = true; })()`)
	p.example("mast")
	if told := p.text(`document.querySelector("#part-whatif").innerText`); !strings.Contains(told, "were not found in time") || p.text(`document.querySelectorAll("#part-whatif .slider").length > 2`) != "true" {
		t.Errorf("%s", told)
	}
}

// While someone types, what was asked before is given up: the answer is that of
// the last text, also where the first takes longest.
func TestLastOneCounts(t *testing.T) {
	p := open(t, "/", wide)
	p.example("mast")
	p.text(`(() => {
		const ask = window.fetch;
		window.paths = [];
		window.fetch = async (path, options) => {
			window.paths.push(path);
			if (options?.body?.includes("first title")) await new Promise((go) => { window.go = go; }); // and never mind the signal
			return ask(path, {...options, signal: undefined});
		};
	})()`)
	typeTitle := func(text string) {
		p.text(fmt.Sprintf(`(() => { const f = document.querySelector("#f-title"); f.value = %q; f.dispatchEvent(new Event("input")); })()`, text))
	}
	typeTitle("first title")
	p.until(`window.go`)
	typeTitle("second title")
	p.until(`window.paths.length === 3`)
	p.answered()
	p.text(`window.go()`)
	p.text(`document.querySelector("#copy-markdown").click()`)
	p.until(`document.querySelector("#copied").value.includes("second title")`)
	if got := p.text(`window.paths.join(" ")`); got != "/v1/classify?what_if=false /v1/classify?what_if=false /v1/classify" {
		t.Errorf("asked %s", got)
	}
}

// Reports come as files, and the map as a picture that says what is on it.
func TestReportsAndMap(t *testing.T) {
	p := open(t, "/", wide)
	folder := t.TempDir()
	p.saveTo(folder)
	p.example("outfall-span")
	for format, begin := range map[string]string{"html": "<!doctype html>", "md": "# ", "png": "\x89PNG"} {
		p.text(fmt.Sprintf(`document.querySelector("#save-%s").click()`, format))
		p.until(fmt.Sprintf(`document.querySelector(".copies").innerText.includes(".%s.")`, format))
		digest := p.shownDigest()[:8]
		name := filepath.Join(folder, "regimed-EL-0218-"+digest+"."+format)
		p.until(fmt.Sprintf(`document.querySelector(".copies").innerText.includes(%q)`, filepath.Base(name)))
		body := p.saved(name)
		if !strings.HasPrefix(strings.ToLower(string(body)), strings.ToLower(begin)) {
			t.Errorf("%s begins with %.40q", name, body)
		}
	}

	if got := p.text(`document.querySelector("#map-x").value + " " + document.querySelector("#map-y").value`); got != "structure.length structure.diameter" {
		t.Errorf("the map is offered over %s", got)
	}
	p.text(`document.querySelector("#map-draw").click()`)
	p.until(`document.querySelector(".map img")?.complete && document.querySelector(".map img").naturalWidth > 100`)
	alt := p.text(`document.querySelector(".map img").alt`)
	if !strings.Contains(alt, "over structure.length from") || !strings.Contains(alt, "Wake oscillator") {
		t.Errorf("the map says %q", alt)
	}
	p.text(`(() => { document.querySelector("#map-y").value = "structure.length"; document.querySelector("#map-draw").click(); })()`)
	p.until(`document.querySelector(".map").innerText.includes("two different inputs")`)
}

// Nothing runs over at 320 px.
func TestNarrow(t *testing.T) {
	p := open(t, "/", narrow)
	over := `[document.documentElement.scrollWidth > innerWidth, ...[...document.querySelectorAll("main *")].filter((e) => e.getBoundingClientRect().right > innerWidth + 1 && !e.closest(".scroll, .unseen")).map((e) => e.outerHTML.slice(0, 80))].join(" ")`
	if got := p.text(over); got != "false" {
		t.Errorf("empty: %s", got)
	}
	for _, name := range []string{"flue-coils", "twin-stays", "microphone", "quartz-fork"} {
		p.example(name)
		p.text(`document.querySelectorAll("details").forEach((d) => { d.open = true; })`)
		if got := p.text(over); got != "false" {
			t.Errorf("%s: %s", name, got)
		}
	}
}
