package render

import (
	"cmp"
	"math"
	"slices"
	"strconv"
	"strings"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
)

// assumptions shows the judged assumptions as a table, hazards apart, then the
// sentence of each, then those whose effect cannot occur.
func (p *page) assumptions(a *regime.Answer) {
	ordinary, hazards := judged(a)
	t := newTable(p.width)
	p.heading("Assumptions")
	p.wrap(dim, "   ", []byte("The bar is error over limit, on a logarithmic scale: = up to u/φ, - up to u·φ, φ the model-form factor. A line that crosses the limit | is marginal."))
	p.legend(t)
	for _, e := range ordinary {
		p.row(a, t, e)
	}
	if len(hazards) > 0 {
		p.heading("Hazards")
		for _, e := range hazards {
			p.row(a, t, e)
		}
	}
	p.heading("Why")
	for _, e := range append(hazards, ordinary...) {
		f := &a.Findings[e.Index()]
		p.room = append(append(p.room[:0], e.ID...), ": "...)
		p.room = appendBecause(p.room, a, f)
		if m := f.Main(); m.Source != nil {
			p.room = append(append(p.room, " ["...), m.Source.Short...)
			p.room = append(p.room, ']')
		}
		p.wrap(verdictStyle(f), mark(f), p.room)
	}
	p.moot(a)
}

// judged lists the assumptions that have an estimate or wait for one, worst
// verdict first and most loaded first.
func judged(a *regime.Answer) (ordinary, hazards []*assumption.Entry) {
	for i, e := range assumption.Catalogue {
		switch {
		case a.Findings[i].Main() == nil:
		case e.Hazard != "":
			hazards = append(hazards, e)
		default:
			ordinary = append(ordinary, e)
		}
	}
	worstFirst := func(x, y *assumption.Entry) int {
		f, g := &a.Findings[x.Index()], &a.Findings[y.Index()]
		return cmp.Or(cmp.Compare(severity(g), severity(f)), cmp.Compare(load(g), load(f)))
	}
	slices.SortStableFunc(ordinary, worstFirst)
	slices.SortStableFunc(hazards, worstFirst)
	return ordinary, hazards
}

// severity orders findings; what is not of interest comes last.
func severity(f *finding.Finding) int {
	if !f.OfInterest {
		return -1
	}
	return int(f.Verdict)
}

// table are the columns of the assumptions.
type table struct {
	perDecade int // columns of the bar
}

const (
	barDecades = 3 // on each side of the limit
	idColumn   = 28
	figures    = 33 // verdict, error and limit, margin
)

func newTable(width int) table {
	room := width - 3 - idColumn - figures - 2
	return table{perDecade: min(max((room-1)/(2*barDecades), 1), 4)}
}

func (t table) half() int { return barDecades * t.perDecade }

// bar draws a utilisation u on a logarithmic scale with the limit in its
// middle: solid up to u/φ, and a thin line from there up to u·φ. A line that
// crosses the limit is a marginal verdict.
func (t table) bar(dst []byte, u, inner, factor float64) []byte {
	solid, thin := t.column(u/inner), t.column(u*factor)
	for i := -t.half(); i <= t.half(); i++ {
		switch {
		case i == 0:
			dst = append(dst, '|')
		case i <= solid:
			dst = append(dst, '=')
		case i <= thin:
			dst = append(dst, '-')
		default:
			dst = append(dst, "·"...)
		}
	}
	return dst
}

// column is the last column that a value reaches; the limit itself is column 0,
// and only what is above it goes beyond.
func (t table) column(u float64) int {
	x := math.Log10(u) * float64(t.perDecade)
	if x > 0 {
		return int(min(math.Ceil(x), float64(t.half())))
	}
	return int(max(math.Floor(x), float64(-t.half()-1)))
}

func (p *page) legend(t table) {
	p.room = pad(p.room[:0], 3+idColumn)
	start := len(p.room)
	p.room = append(p.room, "0.001"...)
	p.room = pad(p.room, t.half()-5)
	p.room = append(p.room, '1')
	p.room = pad(p.room, 2*t.half()+1-4-(len(p.room)-start))
	p.room = append(p.room, "1000  verdict        error/limit margin"...)
	p.line(dim, string(p.room))
}

func (p *page) row(a *regime.Answer, t table, e *assumption.Entry) {
	f := &a.Findings[e.Index()]
	m := f.Main()
	p.room = append(p.room[:0], mark(f)...)
	p.room = left(p.room, e.ID, idColumn)
	if m.Waits {
		p.room = append(p.room, "?"...)
		p.room = pad(p.room, t.half()-1)
		p.room = append(p.room, '|')
		p.room = pad(p.room, t.half())
	} else {
		p.room = t.bar(p.room, m.Utilisation, m.Inner, m.Factor)
	}
	p.room = append(p.room, "  "...)
	verdict := f.Verdict.String()
	if !f.OfInterest {
		verdict = "(" + verdict + ")"
	}
	p.room = left(p.room, verdict, 14)
	share := isShare(a, m)
	var space [48]byte
	figure := append(appendShort(space[:0], m, share), '/')
	p.room = right(p.room, string(appendAmount(figure, m.Limit, share)), 12)
	if !m.Waits {
		p.room = right(p.room, string(appendMargin(space[:0], finding.Margin(m.Utilisation))), 7)
	}
	p.line(verdictStyle(f), string(p.room))
}

// appendShort appends an estimate for a narrow column: the sentence below has
// the digits of those that are tiny or huge.
func appendShort(dst []byte, m *finding.Part, share bool) []byte {
	const tiny, huge = 1e-4, 10
	switch e := m.Estimate; {
	case m.Waits:
		return append(dst, '?')
	case share && e > 0 && e < tiny:
		return append(dst, "<0.01 %"...)
	case share && e > huge:
		return append(dst, ">1000 %"...)
	case e > 0 && e < tiny:
		return append(dst, "<0.0001"...)
	default:
		return appendAmount(dst, e, share)
	}
}

// appendMargin appends a margin with its sign, and never −0.
func appendMargin(dst []byte, margin float64) []byte {
	if margin >= 0 {
		dst, margin = append(dst, '+'), math.Abs(margin)
	}
	return strconv.AppendFloat(dst, margin, 'f', 2, 64)
}

func mark(f *finding.Finding) string {
	switch f.Verdict {
	case finding.Invalid:
		return " x "
	case finding.Marginal:
		return " ~ "
	case finding.Undetermined:
		return " ? "
	}
	return "   "
}

func verdictStyle(f *finding.Finding) style {
	switch {
	case !f.OfInterest:
		return dim
	case f.Verdict == finding.Invalid:
		return red
	case f.Verdict == finding.Valid:
		return green
	}
	return yellow
}

// moot lists what cannot occur, by reason.
func (p *page) moot(a *regime.Answer) {
	list := mootSentences(a)
	if len(list) == 0 {
		return
	}
	p.heading("Cannot occur here")
	for _, s := range list {
		p.wrap(dim, "   ", []byte(s))
	}
}

// mootSentences say why assumptions hold whose effect cannot occur, in one
// sentence a reason.
func mootSentences(a *regime.Answer) []string {
	var all []string
	done := make([]bool, len(a.Findings))
	for i := range a.Findings {
		if a.Findings[i].Main() != nil || done[i] {
			continue
		}
		reason := string(appendBecause(nil, a, &a.Findings[i]))
		dst := []byte(strings.TrimSuffix(reason, "."))
		sep := " ("
		for j := i; j < len(a.Findings); j++ {
			g := &a.Findings[j]
			if g.Main() == nil && !done[j] && string(appendBecause(nil, a, g)) == reason {
				dst = append(append(dst, sep...), assumption.Catalogue[j].ID...)
				sep, done[j] = ", ", true
			}
		}
		all = append(all, string(append(dst, ")."...)))
	}
	return all
}

// sortWaiting puts the bounds that are hardest to keep first.
func sortWaiting(list []waitingEntry) {
	slices.SortStableFunc(list, func(x, y waitingEntry) int {
		return cmp.Compare(rank(x.hold), rank(y.hold))
	})
}

// rank orders bounds: the smaller upper ones first, then the larger lower ones,
// then what has no bound.
func rank(h hold) float64 {
	switch {
	case math.IsNaN(h.value):
		return math.Inf(1)
	case h.least:
		return math.MaxFloat64 / (1 + math.Abs(h.value))
	}
	return h.value
}
