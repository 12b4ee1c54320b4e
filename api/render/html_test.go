package render

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"errors"
	"io"
	"math"
	"slices"
	"strconv"
	"strings"
	"testing"
	"unicode"

	"golang.org/x/net/html"
	"pgregory.net/rapid"

	"regimed/api/render/marginchart"
	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// voids are the elements of HTML that have no end.
var voids = []string{"meta", "br"}

// checkHTML holds that each element is closed in its order, that nothing runs and
// nothing is loaded. It returns the words.
func checkHTML(t rapid.TB, page []byte) string {
	t.Helper()
	if _, err := html.Parse(bytes.NewReader(page)); err != nil {
		t.Fatal(err)
	}
	var open []string
	var words strings.Builder
	z := html.NewTokenizer(bytes.NewReader(page))
	for {
		kind := z.Next()
		token := z.Token()
		switch kind {
		case html.ErrorToken:
			if !errors.Is(z.Err(), io.EOF) {
				t.Fatal(z.Err())
			}
			if len(open) > 0 {
				t.Fatalf("left open: %v", open)
			}
			return words.String()
		case html.TextToken:
			words.WriteString(token.Data)
		case html.StartTagToken:
			checkTag(t, token)
			if !slices.Contains(voids, token.Data) {
				open = append(open, token.Data)
			}
		case html.SelfClosingTagToken:
			checkTag(t, token)
		case html.EndTagToken:
			if len(open) == 0 || open[len(open)-1] != token.Data {
				t.Fatalf("</%s> closes %v", token.Data, open)
			}
			open = open[:len(open)-1]
		}
	}
}

func checkTag(t rapid.TB, token html.Token) {
	t.Helper()
	if slices.Contains([]string{"script", "iframe", "object", "embed", "link", "img", "a", "base", "form"}, token.Data) {
		t.Fatalf("an element %s", token.Data)
	}
	for _, a := range token.Attr {
		if strings.HasPrefix(a.Key, "on") || a.Key == "src" || a.Key == "href" || a.Key == "style" {
			t.Fatalf("%s has %s=%q", token.Data, a.Key, a.Val)
		}
	}
}

// sections are what a page has to show.
var sections = []string{"Recommended", "Model classes, cheapest first", "Margins of the assumptions", "Findings", "Dimensionless groups", "Set-up figures", "Frequencies"}

func TestPagesAreWellFormed(t *testing.T) {
	all := answers(t)
	for name, a := range shipped(t) {
		all[name] = a
	}
	for name, a := range all {
		page, err := HTML(a)
		if err != nil {
			t.Fatal(err)
		}
		fragment, err := HTMLFragment(a)
		if err != nil {
			t.Fatal(err)
		}
		words := checkHTML(t, page)
		for _, bad := range []string{"<html", "<head", "<body", "<style", "<script"} {
			if bytes.Contains(fragment, []byte(bad)) {
				t.Errorf("%s: the fragment has %s", name, bad)
			}
		}
		for _, body := range []string{words, checkHTML(t, fragment)} {
			checkWords(t, name, a, body)
		}
	}
	if len(all) < 55 {
		t.Errorf("%d answers", len(all))
	}
}

// checkWords holds that a page shows each finding, group, warning and the digest.
func checkWords(t *testing.T, name string, a *regime.Answer, words string) {
	t.Helper()
	want := []string{a.Recommendation.Class.Title, standingCaution, Catalogue()}
	for _, s := range sections {
		if s == "Set-up figures" && len(a.Setup) == 0 || s == "Frequencies" && len(frequencies(nil, a)) == 0 {
			continue
		}
		want = append(want, s)
	}
	for i, e := range assumption.Catalogue {
		want = append(want, e.ID)
		if a.Findings[i].Main() != nil {
			want = append(want, string(appendBecause(nil, a, &a.Findings[i])))
		}
	}
	for id := range group.Count {
		if a.Groups.Has(id) {
			want = append(want, group.Of(id).Title)
		}
	}
	for i := range a.Warnings {
		want = append(want, a.Warnings[i].Sentence)
	}
	want = append(want, variedWords(a)...)
	if a.Case != nil {
		want = append(want, a.Case.Digest())
	}
	for _, s := range want {
		if !strings.Contains(words, s) {
			t.Errorf("%s: %q is not shown", name, s)
		}
	}
}

// hostile draws titles that want to be more than text.
func hostile(t *rapid.T) string {
	pieces := rapid.SliceOfN(rapid.SampledFrom([]string{"<script>alert(1)</script>", "</title>", "</style>", "-->", "\" onload=\"x", "'", "|", "| a | b |", "\\", "$x$", "`", "](javascript:x)",
		"![x](y)", "<img src=x onerror=y>", "&lt;", "&", "=1+1", "@all", "#1", "*", "_", "~", "\n", "\r\n", ",", ";", "\"", "</svg>", "]]>", "{{.}}", "ρ", "\u202e", "x"}), 1, 8).Draw(t, "pieces")
	return strings.Join(pieces, "")
}

// A title of the caller's stands as text in every form, and breaks none.
func TestHostileTitles(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		title := hostile(t)
		quoted, err := json.Marshal(title)
		if err != nil {
			t.Fatal(err)
		}
		a := classifyRapid(t, `{"title":`+string(quoted)+`,"reference":`+string(quoted)+`,"structure":{"kind":"plate","length":"1 m","width":"1 m","thickness":"10 mm +- 2 mm","material":"steel","wetted_sides":1},"fluid":"water"}`)
		page, err := HTML(a)
		if err != nil {
			t.Fatal(err)
		}
		if words := checkHTML(t, page); !strings.Contains(withoutBlanks(words), withoutBlanks(title)) {
			t.Fatalf("%q is not on the page", title)
		}
		checkXML(t, AppendStrip(nil, a))
		checkXML(t, MarginChart(a).AppendSVG(nil))
		text, err := Markdown(a)
		if err != nil {
			t.Fatal(err)
		}
		checkMarkdown(t, string(text))
		checkCSV(t, a)
	})
}

// withoutBlanks leaves out blanks, which HTML may change.
func withoutBlanks(s string) string {
	return strings.Map(func(r rune) rune {
		if unicode.IsSpace(r) {
			return -1
		}
		return r
	}, s)
}

// checkMarkdown holds that tables are rectangular, that no HTML stands in the text,
// and that each formula is closed.
func checkMarkdown(t rapid.TB, text string) {
	t.Helper()
	columns, tables := 0, 0
	for line := range strings.Lines(text) {
		line = strings.TrimSuffix(line, "\n")
		if strings.ContainsAny(line, "<>") && !strings.HasPrefix(line, ">") {
			t.Fatalf("HTML in %q", line)
		}
		if n := unescaped(line, '$'); n%2 != 0 {
			t.Fatalf("a formula is open in %q", line)
		}
		n := unescaped(line, '|')
		switch {
		case !strings.HasPrefix(line, "|"):
			if n > 0 {
				t.Fatalf("a bar outside a table: %q", line)
			}
			columns = 0
			continue
		case columns == 0:
			columns = n
			tables++
		case n != columns:
			t.Fatalf("%d bars instead of %d in %q", n, columns, line)
		}
	}
	if tables < 4 {
		t.Fatalf("%d tables", tables)
	}
}

func unescaped(line string, sign byte) int {
	n := 0
	for i := 0; i < len(line); i++ {
		switch line[i] {
		case '\\':
			if i+1 < len(line) && strings.IndexByte("\\|$", line[i+1]) >= 0 {
				i++
			}
		case sign:
			n++
		}
	}
	return n
}

func TestMarkdownIsRectangular(t *testing.T) {
	all := shipped(t)
	for name, a := range all {
		text, err := Markdown(a)
		if err != nil {
			t.Fatal(err)
		}
		checkMarkdown(t, string(text))
		if !strings.Contains(string(text), a.Case.Digest()) {
			t.Errorf("%s: no digest", name)
		}
	}
	if len(all) < 50 {
		t.Errorf("%d cases", len(all))
	}
}

func TestFormulas(t *testing.T) {
	rows := map[string]string{
		"U/(f L)": "$U/(f L)$", "U L/ν": `$U L/\nu$`, "U/√(g d)": `$U/\sqrt{g d}$`, "½ μ Γi,ac/(1 + μ Γr,ac)": `$\tfrac{1}{2} \mu  \Gamma_{i,\mathrm{ac}}/(1 + \mu  \Gamma_{r,\mathrm{ac}})$`,
		"Re": `$\mathrm{Re}$`, "m*": "$m^{*}$", "U_R": `$U_{\mathrm{R}}$`, "ρ U²/E": `$\rho  U^{2}/E$`, "f_v L/U": `$f_{\mathrm{v}} L/U$`, "2π³ St² α": `$2\pi ^{3} \mathrm{St}^{2} \alpha$`,
		"dry structural mass / mass of the displaced fluid": "dry structural mass / mass of the displaced fluid",
		"q → r":  "`q → r`",
		"√x":     "`√x`",
		"√(a(b)": "`√(a(b)`",
	}
	for from, want := range rows {
		if got := formula(from); got != want {
			t.Errorf("%s: %s, want %s", from, got, want)
		}
	}
	if len(rows) != 14 {
		t.Errorf("%d rows", len(rows))
	}
	set := 0
	for id := range group.Count {
		if f, _ := cutFormula(group.Of(id).Definition); strings.HasPrefix(formula(f), "$") {
			set++
		}
	}
	if set < 30 {
		t.Errorf("only %d formulas are set in TeX", set)
	}
}

func TestCutFormula(t *testing.T) {
	rows := map[string][2]string{
		"U/(f L), f the dry natural frequency":  {"U/(f L)", ", f the dry natural frequency"},
		"½ μ Γi,ac/(1 + μ Γr,ac)":               {"½ μ Γi,ac/(1 + μ Γr,ac)", ""},
		"ideal added mass, as given / dry mass": {"ideal added mass, as given / dry mass", ""},
		"a / b; or the other":                   {"a / b", "; or the other"},
		"":                                      {"", ""},
	}
	for from, want := range rows {
		if f, rest := cutFormula(from); f != want[0] || rest != want[1] {
			t.Errorf("%q: %q and %q", from, f, rest)
		}
	}
	if len(rows) != 5 {
		t.Errorf("%d rows", len(rows))
	}
}

// checkCSV reads the table back and compares it with the JSON of the same answer.
func checkCSV(t rapid.TB, a *regime.Answer) int {
	t.Helper()
	body, err := CSV(a)
	if err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(bytes.NewReader(body)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	if !slices.Equal(rows[0], CSVColumns) || bytes.Count(body, []byte("\n")) != bytes.Count(body, []byte("\r\n")) || len(rows) != bytes.Count(body, []byte("\r\n")) {
		t.Fatal("no table by RFC 4180 with a row a line")
	}
	var record csvRecord
	if err := json.Unmarshal(AppendJSON(nil, a, All), &record); err != nil {
		t.Fatal(err)
	}
	n := 0
	same := func(where, cell string, want *float64) {
		n++
		if want == nil {
			if cell != "" {
				t.Fatalf("%s: %q, and null in JSON", where, cell)
			}
			return
		}
		if x, err := strconv.ParseFloat(cell, 64); err != nil || x != *want {
			t.Fatalf("%s: %q, and %v in JSON", where, cell, *want)
		}
	}
	seen := map[string]int{}
	for _, r := range rows[1:] {
		seen[r[0]]++
		for _, cell := range r {
			if cell != "" && strings.IndexByte("=@", cell[0]) >= 0 {
				t.Fatalf("a spreadsheet computes %q", cell)
			}
		}
		switch r[0] {
		case "finding":
			f := record.Findings[r[1]]
			sameQuantiles(r, f.Quantiles, same)
			same(r[1], r[3], f.Estimate)
			same(r[1], r[5], f.Limit)
			same(r[1], r[6], f.Utilisation)
			same(r[1], r[7], f.Factor)
			same(r[1], r[8], f.Margin)
		case "group":
			sameQuantiles(r, record.Groups[r[1]].Quantiles, same)
			same(r[1], r[3], record.Groups[r[1]].Value)
		case "scale":
			same(r[1], r[3], record.Scales[r[1]].Value)
		}
	}
	checkVaried(t, rows, &record, same)
	if seen["finding"] != len(record.Findings) || seen["group"] != len(record.Groups) || seen["scale"] != len(record.Scales) {
		t.Fatalf("parts %v", seen)
	}
	return n
}

func TestTableEqualsJSON(t *testing.T) {
	n := 0
	for _, list := range []map[string]*regime.Answer{shipped(t), answers(t)} {
		for _, a := range list {
			n += checkCSV(t, a)
		}
	}
	if n < 22000 {
		t.Errorf("compared %d numbers", n)
	}
}

// Every ink on every paper has the contrast that WCAG 2.2 asks for at level AA.
func TestContrast(t *testing.T) {
	_, rest, _ := strings.Cut(htmlSource, ":root {")
	light, rest, _ := strings.Cut(rest, "}")
	_, rest, _ = strings.Cut(rest, ":root {")
	dark, _, _ := strings.Cut(rest, "}")
	n := 0
	for name, theme := range map[string]string{"light": light, "dark": dark} {
		colour := map[string]float64{}
		for one := range strings.SplitSeq(theme, ";") {
			key, value, found := strings.Cut(strings.TrimSpace(one), ": #")
			if found {
				colour[key] = luminance(t, value)
			}
		}
		for _, paper := range []string{"--paper", "--stripe"} {
			for _, ink := range []string{"--ink", "--grey", "--valid", "--marginal", "--invalid", "--undetermined"} {
				a, b := colour[paper], colour[ink]
				if ratio := (math.Max(a, b) + 0.05) / (math.Min(a, b) + 0.05); ratio < 4.5 {
					t.Errorf("%s: %s on %s has a contrast of %.2f", name, ink, paper, ratio)
				}
				n++
			}
		}
	}
	if n != 24 {
		t.Errorf("%d pairs", n)
	}
}

// luminance is the relative luminance of a colour (WCAG 2.2).
func luminance(t *testing.T, hexadecimal string) float64 {
	t.Helper()
	x, err := strconv.ParseUint(hexadecimal, 16, 32)
	if err != nil {
		t.Fatal(err)
	}
	linear := func(c uint64) float64 {
		v := float64(c&255) / 255
		if v <= 0.04045 {
			return v / 12.92
		}
		return math.Pow((v+0.055)/1.055, 2.4)
	}
	return 0.2126*linear(x>>16) + 0.7152*linear(x>>8) + 0.0722*linear(x)
}

// The strip names what stands worst of the recommended class.
func TestStrip(t *testing.T) {
	n := 0
	for name, a := range shipped(t) {
		strip := string(AppendStrip(nil, a))
		checkXML(t, []byte(strip))
		if !strings.Contains(strip, marginchart.Escape(a.Recommendation.Class.Title)) || !strings.Contains(strip, a.Case.Digest()[:12]) || !strings.Contains(strip, `width="640" height="64"`) {
			t.Errorf("%s: %s", name, strip)
		}
		if text, v := worstText(a); v == finding.Invalid || text == "" {
			t.Errorf("%s: the recommended class has %q", name, text)
		}
		n++
	}
	if n < 50 {
		t.Errorf("%d strips", n)
	}
}
