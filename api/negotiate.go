package api

import (
	"fmt"
	"mime"
	"net/http"
	"slices"
	"strconv"
	"strings"

	"github.com/labstack/echo/v4"

	"regimed/api/render"
	"regimed/regime"
	"regimed/regime/input"
)

// varyAccept is the header of answers that depend on what a caller accepts. One
// for all: nobody writes into it.
var varyAccept = []string{echo.HeaderAccept}

// wantedForm reads in which form a caller wants the answer: that of ?format=, else
// the one that suits the headers best. nil stands for JSON, which is the usual
// wish, found without taking a header apart; with fields there is no other.
func wantedForm(c echo.Context, name string, fields bool) (*format, error) {
	if name != "" {
		f, _ := formatNamed(formAlias(name))
		return jsonIsNil(f), nil
	}
	accept := c.Request().Header[echo.HeaderAccept]
	if len(accept) == 0 || len(accept) == 1 && (accept[0] == "*/*" || accept[0] == echo.MIMEApplicationJSON) {
		return nil, nil
	}
	forms := answerFormats
	if fields {
		forms = forms[:1]
	}
	f := negotiate(accept, forms)
	if f == nil && fields {
		return nil, problem(notAcceptable, "With fields the answer comes as application/json; the header Accept does not ask for it.")
	}
	if f == nil {
		return nil, problem(notAcceptable, "The answer comes as "+strings.Join(mediaTypes(), ", ")+"; the header Accept asks for none of them.")
	}
	return jsonIsNil(f), nil
}

func jsonIsNil(f *format) *format {
	if f == nil || f.name == "json" {
		return nil
	}
	return f
}

// formAlias is the name in the table of a name that people use.
func formAlias(name string) string {
	if name == "text" {
		return "txt"
	}
	return name
}

// mediaTypes are those of the forms, each once and without parameters.
func mediaTypes() []string {
	var list []string
	for i := range answerFormats {
		if media := answerFormats[i].media(); !slices.Contains(list, media) {
			list = append(list, media)
		}
	}
	return list
}

func (f *format) media() string {
	media, _, _ := strings.Cut(f.mediaType, ";")
	return media
}

// negotiate finds the form with the greatest weight, the first of the table among
// equals; for each, the most specific range that covers it decides (RFC 9110,
// 12.5.1). Who says nothing that can be understood takes anything.
func negotiate(accept []string, forms []format) *format {
	ranges := acceptRanges(accept)
	if len(ranges) == 0 {
		return &forms[0]
	}
	var best *format
	most := 0.0
	for i := range forms {
		f := &forms[i]
		if w := weightOf(f.media(), ranges); w > most {
			best, most = f, w
		}
	}
	return best
}

// acceptRange is an element of the header Accept.
type acceptRange struct {
	media  string
	weight float64
}

func acceptRanges(lines []string) []acceptRange {
	var list []acceptRange
	for _, line := range lines {
		for one := range strings.SplitSeq(line, ",") {
			media, parameters, err := mime.ParseMediaType(one)
			if err != nil {
				continue
			}
			list = append(list, acceptRange{media, weight(parameters["q"])})
		}
	}
	return list
}

// weight reads a weight, from 0 to 1; what is none is 1, as if it were not given.
func weight(q string) float64 {
	x, err := strconv.ParseFloat(q, 64)
	if err != nil || !(x >= 0 && x <= 1) {
		return 1
	}
	return x
}

// weightOf is the weight that a list of ranges gives a medium; 0: none covers it.
func weightOf(media string, ranges []acceptRange) float64 {
	kind, _, _ := strings.Cut(media, "/")
	closest, w := -1, 0.0
	for _, r := range ranges {
		rank := -1
		switch r.media {
		case media:
			rank = 2
		case kind + "/*":
			rank = 1
		case "*/*":
			rank = 0
		}
		if rank > closest || rank == closest && rank >= 0 && r.weight > w {
			closest, w = rank, r.weight
		}
	}
	return w
}

// checkForm adds what is wrong with ?format= and with fields beside it.
func checkForm(bad []input.Violation, name string, given, fields bool) []input.Violation {
	if !given {
		return bad
	}
	var more input.Violations
	f, hint := formatNamed(formAlias(name))
	switch {
	case f == nil:
		more.Add("/format", input.UnknownChoice, "No form of the answer is called "+quoted(name)+". "+strings.ReplaceAll(strings.ReplaceAll(hint, " .", " "), "There are", "Known are"), jsonString(name))
	case f.name != "json" && fields:
		more.Add("/fields", input.Contradiction, "fields trims the answer in JSON; in the form "+f.name+" it is whole.", jsonString(name))
	}
	return append(bad, more.List()...)
}

// sendForm draws an answer in a form, releases it and sends what was drawn, which
// may load nothing and run nothing.
func sendForm(c echo.Context, f *format, a *regime.Answer) error {
	body, err := f.draw(a)
	a.Release()
	if err != nil {
		return err
	}
	c.Response().Header().Set(echo.HeaderContentSecurityPolicy, recordPolicy)
	return send(c, http.StatusOK, f.mediaType, body)
}

// Draw draws an answer in a form by its name, as the service does.
func Draw(name string, a *regime.Answer) ([]byte, error) {
	f, hint := formatNamed(formAlias(name))
	if f == nil {
		return nil, fmt.Errorf("no form of the answer is called %q. %s", name, hint)
	}
	return f.draw(a)
}

func drawChart(a *regime.Answer) ([]byte, error)    { return render.MarginChart(a).AppendSVG(nil), nil }
func drawChartPNG(a *regime.Answer) ([]byte, error) { return render.MarginChart(a).PNG() }

func drawStrip(a *regime.Answer) ([]byte, error) { return render.AppendStrip(nil, a), nil }
