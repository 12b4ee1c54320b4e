package api

import (
	"strings"

	"regimed/api/render"
	"regimed/regime"
	"regimed/regime/input"
)

// format is a form in which an answer can be had.
type format struct {
	name      string // the suffix of a path, without its dot
	mediaType string
	draw      func(*regime.Answer) ([]byte, error)

	// mark writes a note into what was drawn, where a reader can't miss it.
	// None: the form is data that says itself which engine made it.
	mark func(body []byte, note string) ([]byte, error)
}

const typeText = "text/plain; charset=utf-8"

// answerFormats is the list of forms; one more is a line. JSON is the first.
var answerFormats = []format{
	{"json", typeJSON, drawJSON, nil},
	{"txt", typeText, drawText, markText},
	{"html", "text/html; charset=utf-8", render.HTML, markHTML},
	{"md", "text/markdown; charset=utf-8", render.Markdown, markMarkdown},
	{"csv", "text/csv; charset=utf-8", render.CSV, markCSV},
	{"svg", "image/svg+xml", drawChart, markSVG},
	{"png", "image/png", drawChartPNG, markPNG},
	{"strip", "image/svg+xml", drawStrip, markSVG},
}

func drawJSON(a *regime.Answer) ([]byte, error) { return render.AppendJSON(nil, a, render.All), nil }

func drawText(a *regime.Answer) ([]byte, error) {
	return render.AppendText(nil, a, render.TextOptions{}), nil
}

// formatNamed finds a form; without one, the names that may be meant.
func formatNamed(name string) (*format, string) {
	for i := range answerFormats {
		if answerFormats[i].name == name {
			return &answerFormats[i], ""
		}
	}
	if near := input.Nearest(name, FormatNames()); len(near) > 0 {
		return nil, "Did you mean ." + strings.Join(near, " or .") + "?"
	}
	return nil, "There are ." + strings.Join(FormatNames(), ", .") + "."
}

// FormatNames lists the forms that an answer comes in.
func FormatNames() []string {
	var names []string
	for i := range answerFormats {
		names = append(names, answerFormats[i].name)
	}
	return names
}
