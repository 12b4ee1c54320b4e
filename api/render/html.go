package render

import (
	"bytes"
	_ "embed"
	"html/template"

	"regimed/regime"
)

//go:embed html.tmpl
var htmlSource string

var htmlTemplates = template.Must(template.New("").Funcs(template.FuncMap{
	"noTurn":      func() string { return noTurn },
	"turnsOrder":  func() string { return turnsOrder },
	"driversRule": func() string { return driversRule },
}).Parse(htmlSource))

// sheet is a report as the templates want it.
type sheet struct {
	*report
	print
	Chart template.HTML // made here, with its own escaping
}

// Further is how many turning points are on screen alone.
func (s *sheet) Further() int { return max(len(s.Changes)-s.Turns, 0) }

// HTML returns the answer as a page that stands alone: it loads nothing, runs
// nothing, follows the reader's choice of light or dark, and prints on two sheets
// of A4 unless the case is out of the ordinary.
func HTML(a *regime.Answer) ([]byte, error) { return layHTML(a, "page") }

// HTMLFragment returns the same content as an element to put into another page,
// without style.
func HTMLFragment(a *regime.Answer) ([]byte, error) { return layHTML(a, "fragment") }

func layHTML(a *regime.Answer, name string) ([]byte, error) {
	chart := barsOf(a)
	s := sheet{report: newReport(a), Chart: template.HTML(chart.AppendSVG(nil))}
	s.print = fit(s.report, chart)
	var b bytes.Buffer
	err := htmlTemplates.ExecuteTemplate(&b, name, &s)
	return b.Bytes(), err
}
