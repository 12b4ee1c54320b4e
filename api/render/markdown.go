package render

import (
	"strings"

	"regimed/regime"
)

// Markdown returns the answer in the Markdown of code hosts and wikis: headings,
// tables, and the formulas of the groups between dollar signs as TeX, or as code
// where they can't be set with certainty.
func Markdown(a *regime.Answer) ([]byte, error) {
	r := newReport(a)
	m := &markdown{}
	m.recommendation(r)
	m.likely(&r.varied)
	m.list("On condition that", r.Conditions)
	m.changes(&r.varied)
	m.rungs(r.Rungs)
	m.findings(r)
	m.list("Cannot occur here", r.Moot)
	m.groups(r)
	m.figures(r)
	m.list("Warnings", r.Warnings)
	m.list("Cautions", append(r.Hazards, r.Caution))
	m.foot(r)
	return []byte(m.String()), nil
}

// markdown is a page that is being written.
type markdown struct{ strings.Builder }

// safe escapes what Markdown, HTML or a code host would take for more than a
// letter, so that a text stands on the page as it was written.
func safe(s string) string { return markdownSigns.Replace(oneLine(s)) }

var markdownSigns = strings.NewReplacer(`\`, `\\`, "`", "\\`", "*", `\*`, "_", `\_`, "[", `\[`, "]", `\]`, "|", `\|`, "$", `\$`, "~", `\~`, "#", `\#`, "!", `\!`,
	"<", "&lt;", ">", "&gt;", "&", "&amp;", "@", "&#64;", "://", ":&#47;/", "www.", "www&#46;")

func code(s string) string { return "`" + strings.ReplaceAll(s, "|", "¦") + "`" }

func (m *markdown) heading(s string) { m.WriteString("\n## " + s + "\n\n") }

func (m *markdown) list(title string, items []string) {
	if len(items) == 0 {
		return
	}
	m.heading(title)
	for _, s := range items {
		m.WriteString("- " + safe(s) + "\n")
	}
}

// table writes a table whose cells are set already. A column that begins with a
// colon is aligned to the right.
func (m *markdown) table(heads []string, rows [][]string) {
	rule := make([]string, len(heads))
	for i, h := range heads {
		rule[i] = "---"
		if strings.HasPrefix(h, ":") {
			heads[i], rule[i] = h[1:], "---:"
		}
	}
	m.row(heads)
	m.row(rule)
	for _, r := range rows {
		m.row(r)
	}
}

func (m *markdown) row(cells []string) { m.WriteString("| " + strings.Join(cells, " | ") + " |\n") }

func (m *markdown) recommendation(r *report) {
	title := r.Title
	if title == "" {
		title = r.Kind
	}
	m.WriteString("# " + safe(title) + "\n\n" + safe(r.Kind))
	if r.Reference != "" {
		m.WriteString(" (" + safe(r.Reference) + ")")
	}
	m.WriteString("\n\n**" + r.Lead + ": " + safe(r.Class) + "** (" + code(r.ID) + ")\n\n" + safe(r.Why))
	if r.Beside != "" {
		m.WriteString(" " + safe(r.Beside))
	}
	m.WriteString("\n\n")
	for i, x := range r.Axes {
		if i > 0 {
			m.WriteString(", ")
		}
		m.WriteString(safe(x.Name) + ": " + safe(x.Value))
	}
	m.WriteString("\n\nTolerance " + safe(r.Study) + "\n")
}

// likely shows what the uncertain inputs make of the answer.
func (m *markdown) likely(v *varied) {
	if v.Draws == "" {
		return
	}
	m.heading("Uncertain inputs")
	for _, x := range v.Uncertain {
		m.WriteString("- " + code(x.Name) + " " + safe(x.Value) + "\n")
	}
	m.WriteString("\n" + safe(v.Draws) + "\n")
	var rows [][]string
	for _, c := range v.Likely {
		title := safe(c.Title)
		if c.Recommended {
			title = "**" + title + "**"
		}
		rows = append(rows, []string{title + " (" + code(c.ID) + ")", c.Probability, c.StandardError})
	}
	m.section("How likely each class is to be the one", []string{"Class", ":Probability", ":±"}, rows)
	rows = nil
	for _, x := range v.Odds {
		rows = append(rows, []string{code(x.Name), safe(x.Value)})
	}
	m.section("Assumptions that hold or fall with them", []string{"Assumption", "Verdicts"}, rows)
}

func (m *markdown) changes(v *varied) {
	if !v.Explored {
		return
	}
	m.heading("What would change the answer")
	if len(v.Changes) == 0 {
		m.WriteString(noTurn + "\n")
	} else {
		m.WriteString(turnsOrder + "\n\n")
		var rows [][]string
		for _, c := range v.Changes {
			rows = append(rows, []string{code(c.Input), safe(c.Value), safe(c.Verdict), safe(c.Class)})
		}
		m.table([]string{"Input", ":Value", "What turns", "Class"}, rows)
	}
	if len(v.Drivers) == 0 {
		return
	}
	m.WriteString("\n" + driversRule + "\n\n")
	for _, d := range v.Drivers {
		m.WriteString("- " + code(d.Finding) + " " + safe(d.Inputs) + "\n")
	}
}

func (m *markdown) rungs(list []rung) {
	m.heading("Model classes, cheapest first")
	var rows [][]string
	for i := range list {
		r := &list[i]
		outcome := safe(r.Outcome)
		if r.Recommended {
			outcome = "**" + outcome + "**"
		}
		rows = append(rows, []string{r.Rank, safe(r.Title) + " (" + code(r.ID) + ")", outcome, safe(strings.Join(r.Reasons, "; "))})
	}
	m.table([]string{":Rank", "Class", "Outcome", "Why"}, rows)
}

func (m *markdown) findings(r *report) {
	m.heading("Findings")
	var rows [][]string
	for i := range r.Findings {
		f := &r.Findings[i]
		verdict, because := f.Mark+" "+f.Verdict, safe(f.Because)
		if f.Aside {
			verdict = f.Mark + " (" + f.Verdict + ")"
		}
		if f.Source != "" {
			because += " \\[" + safe(f.Source) + "\\]"
		}
		name := code(f.ID)
		if f.Hazard {
			name = "**" + name + "**"
		}
		estimate := f.Estimate
		if f.Waits {
			estimate = "?"
		}
		rows = append(rows, []string{name, verdict, safe(estimate), safe(f.Limit), f.Factor, f.Utilisation, f.Margin, because})
	}
	m.table([]string{"Assumption", "Verdict", ":Estimate", ":Limit", ":$\\phi$", ":Utilisation", ":Margin", "Why"}, rows)
	m.WriteString("\nHazards come first, in bold. The margin is $-\\log_{10}$ of the utilisation. A verdict in brackets is of no interest in this study. ° The content of the source was written down from memory.\n")
	if len(r.Criteria) == 0 {
		return
	}
	m.heading("Criteria of standards")
	rows = nil
	for _, c := range r.Criteria {
		verdict := c.Verdict
		if c.Picked != "" {
			verdict += ", " + c.Picked
		}
		rows = append(rows, []string{safe(c.Criterion), safe(c.Clause), code(c.Finding), c.Utilisation, verdict})
	}
	m.table([]string{"Standard", "Clause", "Assumption", ":Utilisation", "Verdict"}, rows)
}

func (m *markdown) groups(r *report) {
	m.heading("Dimensionless groups")
	heads := []string{"Symbol", ":Value", "Group", "Definition", "Range", "With"}
	varies := r.hasSpreads()
	if varies {
		heads = append(heads, "90 % of draws")
	}
	var rows [][]string
	for i := range r.Groups {
		g := &r.Groups[i]
		value, meaning := g.Value, formula(g.Formula)+safe(g.Rest)
		if g.Reason != "" {
			value, meaning = "–", safe(g.Reason)
		}
		row := []string{formula(g.Symbol), value, safe(g.Title), meaning, safe(g.Band), safe(g.With)}
		if varies {
			row = append(row, g.Spread)
		}
		rows = append(rows, row)
	}
	m.table(heads, rows)
	if len(r.WaitingGroups) > 0 {
		m.WriteString("\n" + safe(strings.Join(r.WaitingGroups, " ")) + "\n")
	}
}

func (m *markdown) figures(r *report) {
	var rows [][]string
	for _, s := range r.Scales {
		rows = append(rows, []string{formula(s.Symbol), s.Value, safe(s.Title), safe(s.Origin)})
	}
	m.section("Assumed or looked up", []string{"Symbol", ":Value", "Meaning", "Origin"}, rows)
	rows = nil
	for _, x := range r.Modes {
		rows = append(rows, []string{x.Number, x.Dry, x.Wet, code(x.Class), safe(x.Worst), x.Utilisation})
	}
	m.section("Modes", []string{":Mode", ":Dry", ":Wet", "Class", "Most loaded by", ":Utilisation"}, rows)
	rows = nil
	for _, s := range r.Setup {
		title := safe(s.Title)
		if s.Governs {
			title = "**" + title + "** (governs)"
		}
		rows = append(rows, []string{title, safe(s.Value), safe(s.Rule), safe(s.Source)})
	}
	m.section("Set-up figures", []string{"Figure", ":Value", "Rule", "Source"}, rows)
	rows = nil
	for _, f := range r.Frequencies {
		rows = append(rows, []string{safe(f.Title), f.Value, safe(f.Ratio)})
	}
	m.section("Frequencies", []string{"Frequency", ":Value", ":Ratio"}, rows)
}

func (m *markdown) section(title string, heads []string, rows [][]string) {
	if len(rows) == 0 {
		return
	}
	m.heading(title)
	m.table(heads, rows)
}

func (m *markdown) foot(r *report) {
	m.WriteString("\n---\n\n")
	if r.Digest != "" {
		m.WriteString("Case " + code(r.Digest) + ", ")
	}
	m.WriteString("regimed " + safe(r.Version) + ", catalogue " + code(r.Catalogue) + "\n")
}

// formula sets a formula in TeX where that is certain. Words stay words, and
// everything else becomes code.
func formula(s string) string {
	if tex, ok := texOf(s); ok {
		return "$" + tex + "$"
	}
	if hasWords(s) {
		return safe(s)
	}
	return code(s)
}

// hasWords reports whether a text has a word of three letters or more.
func hasWords(s string) bool {
	n := 0
	for _, r := range s {
		if r >= 'a' && r <= 'z' || r >= 'A' && r <= 'Z' {
			if n++; n == 3 {
				return true
			}
			continue
		}
		n = 0
	}
	return false
}

// texNames are symbols of two letters, which are no products.
var texNames = map[string]bool{"Re": true, "St": true, "Pr": true, "KC": true, "Fr": true, "He": true, "Bo": true, "We": true, "Cy": true, "Sc": true, "Kn": true, "Cp": true}

// texSigns are the signs that have a spelling of their own in TeX.
var texSigns = map[rune]string{
	'α': `\alpha `, 'β': `\beta `, 'γ': `\gamma `, 'δ': `\delta `, 'ε': `\varepsilon `, 'ζ': `\zeta `, 'η': `\eta `, 'κ': `\kappa `, 'λ': `\lambda `,
	'μ': `\mu `, 'ν': `\nu `, 'ξ': `\xi `, 'π': `\pi `, 'ρ': `\rho `, 'σ': `\sigma `, 'τ': `\tau `, 'φ': `\varphi `, 'ω': `\omega `, 'Γ': `\Gamma `, 'Δ': `\Delta `, 'Ω': `\Omega `,
	'²': `^{2}`, '³': `^{3}`, '⁴': `^{4}`, '½': `\tfrac{1}{2}`, '−': `-`, '×': `\times `, '·': `\cdot `, '₀': `_{0}`, '₁': `_{1}`, '₂': `_{2}`, 'ℓ': `\ell `, '′': `'`, '″': `''`, '∞': `\infty `, '√': "",
	'(': `(`, ')': `)`, '/': `/`, '+': `+`, '=': `=`, ' ': ` `, '*': `^{*}`, '|': `\vert `, '.': `.`,
}

// texOf translates a formula of single letters, known names, numbers and signs.
// It refuses a formula with anything else in it.
func texOf(s string) (string, bool) {
	var b strings.Builder
	rest := []rune(s)
	for len(rest) > 0 {
		tex, n := texPart(rest)
		if n == 0 {
			return "", false
		}
		b.WriteString(tex)
		rest = rest[n:]
	}
	return strings.TrimSpace(b.String()), true
}

// texPart translates the next part, of n signs; 0: it can't.
func texPart(s []rune) (tex string, n int) {
	switch r := s[0]; {
	case r == '√':
		return texRoot(s)
	case r == '_':
		return texIndex(s)
	case isLatin(r):
		for n < len(s) && isLatin(s[n]) {
			n++
		}
		switch name := string(s[:n]); {
		case n == 1:
			return name, n
		case texNames[name]:
			return `\mathrm{` + name + `}`, n
		case n == 2:
			return name, n // a product, as in "gL"
		}
		return "", 0
	case r >= '0' && r <= '9':
		return string(r), 1
	default:
		sign, known := texSigns[r]
		if !known || r == '√' {
			return "", 0
		}
		return texAfter(sign, s)
	}
}

// texAfter adds what belongs to a Greek capital: "Γr,ac" is one symbol.
func texAfter(sign string, s []rune) (tex string, n int) {
	if s[0] != 'Γ' || len(s) < 2 || s[1] != 'r' && s[1] != 'i' {
		return sign, 1
	}
	if len(s) >= 5 && string(s[2:5]) == ",ac" {
		return `\Gamma_{` + string(s[1]) + `,\mathrm{ac}}`, 5
	}
	return `\Gamma_{` + string(s[1]) + `}`, 2
}

// texIndex translates an index: letters and digits, up to the next sign.
func texIndex(s []rune) (tex string, n int) {
	n = 1
	for n < len(s) && (isLatin(s[n]) || s[n] >= '0' && s[n] <= '9') {
		n++
	}
	if n > 1 {
		return `_{\mathrm{` + string(s[1:n]) + `}}`, n
	}
	if len(s) > 1 {
		if sign, known := texSigns[s[1]]; known && s[1] >= 'Α' && s[1] <= 'ω' || s[1] == 'ℓ' {
			return `_{` + strings.TrimSpace(sign) + `}`, 2
		}
	}
	return "", 0
}

// texRoot translates a root over brackets.
func texRoot(s []rune) (tex string, n int) {
	if len(s) < 2 || s[1] != '(' {
		return "", 0
	}
	depth := 0
	for i, r := range s {
		switch r {
		case '(':
			depth++
		case ')':
			if depth--; depth == 0 {
				inner, ok := texOf(string(s[2:i]))
				if !ok {
					return "", 0
				}
				return `\sqrt{` + inner + `}`, i + 1
			}
		}
	}
	return "", 0
}

func isLatin(r rune) bool { return r >= 'a' && r <= 'z' || r >= 'A' && r <= 'Z' }
