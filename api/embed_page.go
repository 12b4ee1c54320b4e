package api

import (
	"bytes"
	"cmp"
	"fmt"
	"html/template"
	"math"
	"slices"
	"strings"

	"github.com/go-json-experiment/json"
	"github.com/go-json-experiment/json/jsontext"

	"regimed/api/store"
	"regimed/regime/ladder"
	"regimed/units"
)

// summaryFindings is how many findings a summary shows.
const summaryFindings = 5

// embeddedOf reads what an embedding shows out of a record.
func embeddedOf(r *store.Record, look embedLook, base string) (*embedded, error) {
	e := &embedded{Head: &r.Head, Look: look, Link: base + recordPath(r.ID) + readableSuffix()}
	if err := json.Unmarshal(r.Answer, &e.Answer, jsontext.AllowInvalidUTF8(true)); err != nil {
		return nil, fmt.Errorf("the answer of the record %s: %w", r.ID, err)
	}
	of := restsOn(e.Answer.Recommendation.Class)
	for id, f := range e.Answer.Findings {
		if f.OfInterest && f.Verdict != "not-applicable" && (f.Utilisation != nil || len(f.Needs) > 0) && (look.View != "summary" || of == nil || of[id]) {
			f.ID = id
			e.Shown = append(e.Shown, f)
		}
	}
	slices.SortFunc(e.Shown, func(a, b embeddedFinding) int {
		return cmp.Or(-cmp.Compare(a.load(), b.load()), strings.Compare(a.ID, b.ID))
	})
	if look.View == "summary" && len(e.Shown) > summaryFindings {
		e.Left = len(e.Shown) - summaryFindings
		e.Shown = e.Shown[:summaryFindings]
	}
	return e, nil
}

// restsOn names the assumptions of a class; nil: the engine in force does not
// know the class.
func restsOn(class string) map[string]bool {
	c := ladder.Find(class)
	if c == nil {
		return nil
	}
	names := map[string]bool{}
	for _, e := range c.RestsOn {
		names[e.ID] = true
	}
	return names
}

// readableSuffix is that of the form that a person reads best.
func readableSuffix() string {
	for _, name := range []string{"html", "txt"} {
		if f, _ := formatNamed(name); f != nil {
			return "." + name
		}
	}
	return ""
}

// Title is the title of the record, or what else names it.
func (e *embedded) Title() string {
	return cmp.Or(e.Head.Title, e.Answer.Title, "Record "+e.Head.ID[:store.PrefixDigits])
}

// Caution is the caution that stands under every answer.
func (e *embedded) Caution() string {
	if len(e.Answer.Cautions) == 0 {
		return ""
	}
	return e.Answer.Cautions[0]
}

// Hazards are the cautions beside it: the instabilities that lurk.
func (e *embedded) Hazards() []string { return e.Answer.Cautions[min(1, len(e.Answer.Cautions)):] }

// Foot says who answered, and when.
func (e *embedded) Foot() string {
	by := ""
	if e.Head.Author != "" {
		by = ", recorded by " + e.Head.Author
	}
	return fmt.Sprintf("Answered by regimed %s on %s%s.", e.Head.Engine.Version, e.Head.Created.Format("2006-01-02"), by)
}

func (f embeddedFinding) factor() float64 {
	if f.Factor == nil {
		return 1
	}
	return max(*f.Factor, 1)
}

// load is u·φ, by which findings are ordered. What is not determined comes first.
func (f embeddedFinding) load() float64 {
	if f.Utilisation == nil {
		return math.Inf(1)
	}
	return *f.Utilisation * f.factor()
}

// Price is the utilisation as people read it.
func (f embeddedFinding) Price() string {
	if f.Utilisation == nil {
		return ""
	}
	return string(units.AppendNumber(nil, *f.Utilisation, 3))
}

// Waits says which inputs are missing.
func (f embeddedFinding) Waits() string {
	if f.Utilisation != nil {
		return ""
	}
	return "needs " + strings.Join(f.Needs, ", ")
}

// Bar is the bar of a finding in a picture that is 120 wide: on a logarithmic
// scale from a thousandth of the limit to a thousand times, the limit in the
// middle.
func (f embeddedFinding) Bar() struct{ Low, Width, Spread int } {
	low, high := barPlace(*f.Utilisation/f.factor()), barPlace(f.load())
	return struct{ Low, Width, Spread int }{low, barPlace(*f.Utilisation), max(high-low, 1)}
}

// Sizes of a bar.
const (
	barWidth   = 120
	barDecades = 3
)

// barPlace is where a utilisation stands on a bar.
func barPlace(u float64) int {
	if !(u > 0) {
		return 0
	}
	x := (math.Log10(u) + barDecades) / (2 * barDecades) * barWidth
	return int(math.Round(min(max(x, 0), barWidth)))
}

// embedStyle is the whole style. The theme is an attribute of the page, so that
// the style is always the same text and the policy can name it by its digest.
const embedStyle = `
:root { --back: #ffffff; --ink: #1b2027; --soft: #56606b; --line: #d5dae0; --valid: #12703f; --marginal: #8a5a00; --invalid: #b3261e; }
:root[data-theme=dark] { --back: #15191e; --ink: #e7eaee; --soft: #a3adb8; --line: #363e47; --valid: #56c990; --marginal: #e2b54b; --invalid: #ff968b; }
@media (prefers-color-scheme: dark) {
  :root[data-theme=auto] { --back: #15191e; --ink: #e7eaee; --soft: #a3adb8; --line: #363e47; --valid: #56c990; --marginal: #e2b54b; --invalid: #ff968b; }
}
* { box-sizing: border-box; }
body { margin: 0; padding: 0.75rem 1rem; background: var(--back); color: var(--ink); font: 0.875rem/1.4 system-ui, sans-serif; overflow-wrap: anywhere; }
h1 { margin: 0; font-size: 0.875rem; font-weight: 400; color: var(--soft); }
h2 { margin: 0.15rem 0 0; font-size: 1.1rem; }
p { margin: 0.25rem 0; }
code { font-size: 0.95em; }
table { width: 100%; margin: 0.5rem 0; border-collapse: collapse; }
caption { text-align: left; color: var(--soft); }
th { font-weight: 400; text-align: left; }
th, td { padding: 0.15rem 0.5rem 0.15rem 0; border-top: 1px solid var(--line); }
td.number { text-align: right; font-variant-numeric: tabular-nums; }
svg { display: block; width: 120px; height: 12px; }
.track { fill: var(--line); } .limit { stroke: var(--ink); } .spread { opacity: 0.45; }
.valid { color: var(--valid); fill: var(--valid); } .marginal { color: var(--marginal); fill: var(--marginal); }
.invalid { color: var(--invalid); fill: var(--invalid); } .undetermined { color: var(--soft); fill: var(--soft); }
.soft { color: var(--soft); } .hazard { color: var(--invalid); }
a { color: inherit; }
`

var embedTemplate = template.Must(template.New("embed").Parse(`<!doctype html>
<html lang="en" data-theme="{{.Look.Theme}}">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="{{if eq .Look.Theme "auto"}}light dark{{else}}{{.Look.Theme}}{{end}}">
<title>{{.Title}}</title>
<style>` + embedStyle + `</style>
</head>
<body>
<main>
<h1>{{.Title}}</h1>
{{with .Answer.Recommendation}}<h2>{{.Title}} <code>{{.Class}}</code></h2>
<p>Solves {{.Solves}}.{{if .Provisional}} <strong>Provisional: inputs are missing.</strong>{{end}}{{with len .Conditions}} Conditions to verify: {{.}}.{{end}}</p>{{end}}
{{range .Hazards}}<p class="hazard">{{.}}</p>
{{end}}{{if .Shown}}<table>
<caption>{{if eq .Look.View "summary"}}What this class rests on, the most loaded first.{{else}}All assumptions with a price, the most loaded first. The class above rests on none that is invalid.{{end}}</caption>
<thead><tr><th scope="col">Assumption</th><th scope="col">Verdict</th><th scope="col">Error / limit</th><th scope="col"><span class="soft">0.001 … limit … 1000</span></th></tr></thead>
<tbody>
{{range .Shown}}<tr><th scope="row">{{.Title}}</th><td class="{{.Verdict}}">{{.Verdict}}</td><td class="number">{{.Price}}</td><td>{{if .Waits}}{{.Waits}}{{else}}{{$b := .Bar}}<svg viewBox="0 0 120 12" aria-hidden="true"><rect class="track" y="5" width="120" height="2"/><rect class="{{.Verdict}}" y="3" width="{{$b.Width}}" height="6"/><rect class="{{.Verdict}} spread" x="{{$b.Low}}" y="1" width="{{$b.Spread}}" height="10"/><line class="limit" x1="60" x2="60" y1="0" y2="12"/></svg>{{end}}</td></tr>
{{end}}</tbody>
</table>
{{with .Left}}<p class="soft">More in the record: {{.}}.</p>
{{end}}{{end}}<p><a href="{{.Link}}" target="_blank" rel="noopener noreferrer">The record</a> <span class="soft">{{.Foot}}</span></p>
<p class="soft">{{.Caution}}</p>
</main>
</body>
</html>
`))

// page is the embedding as a page of its own.
func (e *embedded) page() ([]byte, error) {
	var b bytes.Buffer
	err := embedTemplate.Execute(&b, e)
	return b.Bytes(), err
}
