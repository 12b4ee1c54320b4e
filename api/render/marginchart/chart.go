package marginchart

import (
	"cmp"
	"math"
	"slices"
	"strings"

	"regimed/regime/finding"
)

// Chart is what is drawn.
type Chart struct {
	Title   string // above the bars; "": none
	Bars    []Bar
	Waiting []Waiting // undetermined, so without a bar
	Moot    []string  // cannot occur, so without a bar
	Foot    string    // below everything; "": none
}

// Bar is an assumption with an estimate.
type Bar struct {
	Name        string
	Utilisation float64 // u = estimate / limit, ≥ 0
	Inner       float64 // the band begins at u/Inner; ≥ 1
	Factor      float64 // and ends at u·Factor; ≥ 1
	Verdict     finding.Verdict
	Aside       bool   // of no interest in the study: it rules out nothing
	Figure      string // the estimate and its limit, in words
}

// Waiting is an assumption that waits for an input.
type Waiting struct {
	Name  string
	Needs string // what is missing, and how far the assumption holds
}

// Decades of the scale on each side of the limit, u = 1.
const Decades = 3

// Position is where a utilisation lies on the scale: log10(u), held between
// −Decades and Decades.
func Position(u float64) float64 {
	if !(u > 0) {
		return -Decades
	}
	return min(max(math.Log10(u), -Decades), Decades)
}

// beyond says on which side of the scale a utilisation lies: −1, 0 or 1.
func beyond(u float64) int {
	switch {
	case !(u >= 1e-3):
		return -1
	case u > 1e3:
		return 1
	}
	return 0
}

// sorted lists the bars, worst first: by verdict, those of no interest last, and
// by the upper end of the band.
func (c *Chart) sorted() []Bar {
	bars := slices.Clone(c.Bars)
	slices.SortStableFunc(bars, func(x, y Bar) int {
		return cmp.Or(cmp.Compare(severity(&y), severity(&x)), cmp.Compare(y.Utilisation*y.Factor, x.Utilisation*x.Factor))
	})
	return bars
}

func severity(b *Bar) int {
	if b.Aside {
		return -1
	}
	return int(b.Verdict)
}

// verdictWords is a verdict beside its bar.
func (b *Bar) verdictWords() string {
	if b.Aside {
		return "(" + b.Verdict.String() + ")"
	}
	return b.Verdict.String()
}

// Words says the chart in one sentence, for those who can't see it.
func (c *Chart) Words() string {
	var invalid, marginal, valid []string
	for _, b := range c.sorted() {
		switch b.Verdict {
		case finding.Invalid:
			invalid = append(invalid, b.Name)
		case finding.Marginal:
			marginal = append(marginal, b.Name)
		default:
			valid = append(valid, b.Name)
		}
	}
	var waiting []string
	for _, w := range c.Waiting {
		waiting = append(waiting, w.Name)
	}
	var parts []string
	add := func(lead string, names []string) {
		if len(names) > 0 {
			parts = append(parts, lead+" "+strings.Join(names, ", "))
		}
	}
	add("beyond the limit:", invalid)
	add("marginal:", marginal)
	add("within the limit:", valid)
	add("not determined:", waiting)
	if len(parts) == 0 {
		return "Margins of the assumptions: none has an estimate."
	}
	return "Margins of the assumptions, worst first; " + strings.Join(parts, "; ") + "."
}
