package render

import (
	"math"
	"unicode/utf8"

	"regimed/api/render/marginchart"
)

// Measures of the printed page, in points but for the chart.
const (
	pageWidth                     = 513.0
	pageHeight                    = 782.0
	printedWidth                  = 130 // of the chart, in mm
	narrowWidth                   = 106 // of the chart of a case with very much to say
	fewestTurns                   = 4   // of the turning points that paper shows
	mostLetters                   = 8.5
	legible                       = 6.6
	leastLetters                  = 5.5
	letterWidth                   = 0.52       // of a letter, on average, in units of its size
	lineStep                      = 1.24       // from line to line, likewise
	introMeasured, tablesMeasured = 0.88, 0.80 // real over estimated height, in a browser
	fillOfPage                    = 0.88       // what the estimate leaves is its own error
	fillOfFlow                    = 0.92       // likewise, where both parts flow: their errors are seldom of one sign
)

// print is how an answer is printed.
type print struct {
	Letters    float64 // size of the letters in points
	Apart      bool    // the tables begin on a page of their own
	ChartWidth float64 // of the margins, in millimetres
	Turns      int     // how many turning points are printed
	Driven     bool    // with what drives the findings
	Dense      bool    // without what a reader finds on screen: formulas of groups, reasons why an effect cannot occur
}

// fit chooses the largest letters with which an answer fills two pages: with the
// tables on a page of their own where both parts fit, and flowing where they don't.
// What does not fit in legible letters is printed densely, and then with a smaller
// chart, fewer turning points and no drivers. A case with still more takes another page.
func fit(r *report, chart *marginchart.Chart) print {
	const millimetre = 72 / 25.4
	wide, drawn := chart.Size()
	steps := []struct {
		least float64
		print
	}{
		{legible, print{ChartWidth: printedWidth, Turns: mostTurns, Driven: true}},
		{leastLetters, print{ChartWidth: printedWidth, Turns: mostTurns, Driven: true, Dense: true}},
		{leastLetters, print{ChartWidth: narrowWidth, Turns: fewestTurns, Dense: true}},
	}
	for _, step := range steps {
		high := drawn * step.ChartWidth * millimetre / wide
		for letters := mostLetters; letters >= step.least; letters -= 0.1 {
			step.Letters = letters
			if p, ok := fits(r, high, step.print); ok {
				return p
			}
		}
	}
	return print{Letters: leastLetters, ChartWidth: narrowWidth, Turns: fewestTurns, Dense: true}
}

func fits(r *report, chart float64, p print) (print, bool) {
	first, second := firstHeight(r, chart, &p), secondHeight(r, &p)
	sum := first + second
	p.Letters, p.Apart = round(p.Letters), max(first, second) <= fillOfPage*pageHeight
	return p, p.Apart || sum <= 2*fillOfFlow*pageHeight && sum > 1.2*pageHeight
}

func round(x float64) float64 { return math.Round(10*x) / 10 }

// textColumn counts lines of text in a width given in shares of the page.
type textColumn struct {
	letters float64
	share   float64
}

func (c textColumn) lines(parts ...string) float64 {
	n := 0
	for _, s := range parts {
		n += utf8.RuneCountInString(s)
	}
	return math.Max(1, math.Ceil(float64(n)*letterWidth*c.letters/(c.share*pageWidth)))
}

const (
	headingLines = 2.1 // of a heading with its margins
	rowLines     = 0.1 // what a row of a table takes beside its text
)

// firstHeight estimates how high the first part becomes around its chart.
func firstHeight(r *report, chart float64, p *print) float64 {
	letters := p.Letters
	whole, why := textColumn{letters, 1}, textColumn{letters, 0.45}
	n := 7.0 + whole.lines(r.Why, r.Beside) + whole.lines(r.Study) + whole.lines(r.Caution) + 2
	for _, list := range [][]string{r.Conditions, r.Warnings, r.Hazards} {
		n += listLines(whole, list)
	}
	n += headingLines + 1
	for i := range r.Rungs {
		total := 0.0
		for _, s := range r.Rungs[i].Reasons {
			total += float64(utf8.RuneCountInString(s) + 2)
		}
		n += math.Max(1, math.Ceil(total*letterWidth*letters/(why.share*pageWidth))) + rowLines
	}
	n += variedLines(&r.varied, p)
	return (n+headingLines)*lineStep*letters*introMeasured + chart
}

// variedLines counts the lines of what varying the inputs showed.
func variedLines(v *varied, p *print) float64 {
	letters := p.Letters
	whole, odds := textColumn{letters, 1}, textColumn{letters, 0.75}
	n := 0.0
	if v.Draws != "" {
		n += headingLines + whole.lines(append(textsOf(v.Uncertain), v.Draws)...)
	}
	if len(v.Likely) > 0 {
		n += headingLines + 1 + float64(len(v.Likely))*(1+rowLines)
	}
	if len(v.Odds) > 0 {
		n += headingLines + 1
	}
	for _, x := range v.Odds {
		n += odds.lines(x.Value) + rowLines
	}
	if !v.Explored {
		return n
	}
	n += headingLines + 2
	input, value, turns, class := textColumn{letters, 0.22}, textColumn{letters, 0.24}, textColumn{letters, 0.22}, textColumn{letters, 0.28}
	shown := v.Changes[:min(len(v.Changes), p.Turns)]
	for i := range shown {
		c := &shown[i]
		n += max(input.lines(c.Input), value.lines(c.Value), turns.lines(c.Verdict), class.lines(c.Class)) + rowLines
	}
	if len(shown) < len(v.Changes) {
		n++
	}
	if !p.Driven || len(v.Drivers) == 0 {
		return n
	}
	driven := []string{driversRule}
	for _, d := range v.Drivers {
		driven = append(driven, d.Finding, d.Inputs, "   ")
	}
	return n + whole.lines(driven...)
}

func textsOf(list []pair) []string {
	var texts []string
	for _, x := range list {
		texts = append(texts, x.Name, x.Value, "   ")
	}
	return texts
}

func listLines(c textColumn, list []string) float64 {
	if len(list) == 0 {
		return 0
	}
	n := headingLines
	for _, s := range list {
		n += c.lines(s)
	}
	return n
}

// secondHeight estimates how high the tables become.
func secondHeight(r *report, p *print) float64 {
	letters := p.Letters
	whole, half, why := textColumn{letters, 1}, textColumn{letters, 0.34}, textColumn{letters, 0.5}
	n := headingLines + 3.5
	for i := range r.Findings {
		f := &r.Findings[i]
		n += math.Max(why.lines(f.Because, f.Source, "   "), textColumn{letters, 0.14}.lines(f.ID)) + rowLines
	}
	if len(r.Criteria) > 0 {
		n += headingLines + 1 + float64(len(r.Criteria))*(1+rowLines)
	}
	n += asideLines(whole, r.WaitingGroups)
	if p.Dense {
		n += headingLines + whole.lines(r.MootIDs) + 1
	} else {
		n += asideLines(whole, r.Moot)
	}
	cells := 2.0
	for i := range r.Groups {
		g := &r.Groups[i]
		formula := g.Formula
		if p.Dense {
			formula = ""
		}
		cells += half.lines(g.Title, g.Reason, formula, g.Band, g.With, g.Spread, "        ") + rowLines
	}
	n += cells/2 + 1 + headingLines
	if cells = 2; len(r.Scales) > 0 {
		for i := range r.Scales {
			cells += half.lines(r.Scales[i].Title, r.Scales[i].Origin) + rowLines
		}
		n += cells/2 + 1 + headingLines
	}
	for _, rows := range []int{len(r.Modes), (len(r.Frequencies) + 1) / 2} {
		if rows > 0 {
			n += headingLines + 1 + float64(rows)*(1+rowLines)
		}
	}
	if len(r.Setup) > 0 {
		n += headingLines + 1
	}
	for i := range r.Setup {
		n += why.lines(r.Setup[i].Rule, r.Setup[i].Source) + rowLines
	}
	return (n + 4) * lineStep * letters * tablesMeasured
}

func asideLines(c textColumn, list []string) float64 {
	if len(list) == 0 {
		return 0
	}
	n := 0
	for _, s := range list {
		n += utf8.RuneCountInString(s) + 1
	}
	return headingLines + 1 + math.Ceil(float64(n)*letterWidth*c.letters/pageWidth)
}
