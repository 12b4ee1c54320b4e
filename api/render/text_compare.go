package render

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strconv"

	"regimed/regime"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/similar"
	"regimed/units"
)

// newPage begins a page in the columns that were asked for.
func newPage(dst []byte, o TextOptions) *page {
	if o.Width == 0 {
		o.Width = usualWidth
	}
	return &page{dst: dst, width: min(max(o.Width, leastWidth), greatestWidth), colour: o.Colour}
}

// AppendComparison appends a comparison as a page for people: what it comes to
// first, then what differs, most distorted first, then what agrees.
func AppendComparison(dst []byte, c *similar.Comparison, o TextOptions) []byte {
	p := newPage(dst, o)
	p.line(strong, "Two cases compared: "+agreement(c))
	p.blank()
	p.compared("  a  ", c.A)
	p.compared("  b  ", c.B)
	p.differences(c, "a", "b")
	return p.dst
}

// agreement counts the groups of a comparison.
func agreement(c *similar.Comparison) string {
	kept := len(c.Groups) - c.Distorted()
	return fmt.Sprintf("%s kept within %s, %d distorted.", counted(kept, "group"), percent(c.Tolerance), c.Distorted())
}

func counted(n int, what string) string {
	if n == 1 {
		return "1 " + what
	}
	return strconv.Itoa(n) + " " + what + "s"
}

func percent(x float64) string { return string(appendPercent(nil, x)) }

// compared names one of two cases, and what it asks for.
func (p *page) compared(lead string, a *regime.Answer) {
	p.room = p.room[:0]
	if s, ok := textOf(a, kind.Title); ok {
		p.room = append(append(p.room, s...), ", "...)
	}
	p.room = append(append(p.room, a.Kind.Title...), ": "...)
	p.room = appendClass(p.room, a.Recommendation.Class)
	if a.Recommendation.Provisional {
		p.room = append(p.room, ", provisionally"...)
	}
	p.wrap(plain, lead, p.room)
}

// differences shows a comparison below its head; the cases go by two short names.
func (p *page) differences(c *similar.Comparison, a, b string) {
	p.axisPairs(c, a, b)
	p.verdictPairs(c, a, b)
	p.distorted(c, a, b)
	p.kept(c)
	p.alone("Only "+a+" has", c.OnlyA, c.A.Groups, c.B.Groups)
	p.alone("Only "+b+" has", c.OnlyB, c.B.Groups, c.A.Groups)
}

// grid is columns of text, each as wide as its widest entry.
type grid struct {
	heads []string
	rows  [][]string
	style []style
}

func (t *grid) add(s style, cells ...string) {
	t.rows = append(t.rows, cells)
	t.style = append(t.style, s)
}

// grid appends columns; the last one wraps.
func (p *page) grid(t *grid) {
	widths := make([]int, len(t.heads))
	for _, row := range append([][]string{t.heads}, t.rows...) {
		for i, cell := range row {
			widths[i] = max(widths[i], columns(cell))
		}
	}
	p.gridRow(dim, t.heads, widths)
	for i, row := range t.rows {
		p.gridRow(t.style[i], row, widths)
	}
}

func (p *page) gridRow(s style, cells []string, widths []int) {
	last := len(cells) - 1
	lead := []byte("  ")
	for i, cell := range cells[:last] {
		lead = append(left(lead, cell, widths[i]+1), ' ')
	}
	if cells[last] == "" {
		p.line(s, trimRight(string(lead)))
		return
	}
	if columns(string(lead)) > p.width-leastColumn { // too narrow for words: on a line of its own
		p.line(s, trimRight(string(lead)))
		lead = []byte("      ")
	}
	p.wrap(s, string(lead), []byte(cells[last]))
}

// leastColumn is the width below which a last column is no column.
const leastColumn = 10

func trimRight(s string) string {
	for len(s) > 0 && s[len(s)-1] == ' ' {
		s = s[:len(s)-1]
	}
	return s
}

func (p *page) axisPairs(c *similar.Comparison, a, b string) {
	if len(c.Axes) == 0 {
		return
	}
	p.heading("Recommendation: axes that differ")
	t := &grid{heads: []string{"axis", a, b}}
	for _, x := range c.Axes {
		t.add(plain, string(appendSpaced(nil, x.ID)), x.A, x.B)
	}
	p.grid(t)
}

func (p *page) verdictPairs(c *similar.Comparison, a, b string) {
	p.heading("Assumptions judged differently")
	if len(c.Verdicts) == 0 {
		p.line(plain, "  None.")
		return
	}
	t := &grid{heads: []string{"assumption", a, b, "error/limit in " + a, "in " + b}}
	for i := range c.Verdicts {
		v := &c.Verdicts[i]
		t.add(styleOf(v.B), v.Entry.ID, v.A.String(), v.B.String(), fourDigits(v.UtilisationA), fourDigits(v.UtilisationB))
	}
	p.grid(t)
}

func styleOf(v finding.Verdict) style {
	switch v {
	case finding.Invalid:
		return red
	case finding.Marginal, finding.Undetermined:
		return yellow
	}
	return plain
}

// fourDigits writes a number as pages do, a dash where there is none.
func fourDigits(x float64) string {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		return "-"
	}
	return string(units.AppendNumber(nil, x, 4))
}

// distorted lists the groups that are not kept, most distorted first.
func (p *page) distorted(c *similar.Comparison, a, b string) {
	var list []*similar.GroupPair
	for i := range c.Groups {
		if !c.Groups[i].Kept {
			list = append(list, &c.Groups[i])
		}
	}
	if len(list) == 0 {
		return
	}
	slices.SortStableFunc(list, func(x, y *similar.GroupPair) int { return cmp.Compare(distortion(y), distortion(x)) })
	p.heading("Groups distorted")
	t := &grid{heads: []string{"", a, b, b + "/" + a, ""}}
	for _, g := range list {
		t.add(plain, group.Of(g.ID).Symbol, fourDigits(g.A), fourDigits(g.B), fourDigits(g.Factor), group.Of(g.ID).Title+", "+changed(g.Factor))
	}
	p.grid(t)
}

// distortion is how far a factor is from 1, whichever way.
func distortion(g *similar.GroupPair) float64 {
	if !(g.Factor > 0) {
		return math.Inf(1)
	}
	return math.Abs(math.Log(g.Factor))
}

// changed says a factor in words: "253 times smaller".
func changed(factor float64) string {
	switch {
	case math.IsNaN(factor):
		return "no longer zero"
	case factor == 0:
		return "zero"
	case factor < 0:
		return "of the other sign"
	case factor == 1:
		return "the same"
	case factor < 1.1 && factor > 1/1.1:
		return smallChange(factor)
	case factor < 1:
		return times(1/factor) + " times smaller"
	default:
		return times(factor) + " times larger"
	}
}

func smallChange(factor float64) string {
	if factor < 1 {
		return percent(1-factor) + " smaller"
	}
	return percent(factor-1) + " larger"
}

func times(x float64) string { return string(units.AppendNumber(nil, x, 3)) }

func (p *page) kept(c *similar.Comparison) {
	p.room = p.room[:0]
	for i := range c.Groups {
		if g := &c.Groups[i]; g.Kept {
			p.room = p.listed(p.room)
			p.room = append(append(append(p.room, group.Of(g.ID).Title...), ' '), fourDigits(g.B)...)
		}
	}
	if len(p.room) == 0 {
		return
	}
	p.heading("Groups kept")
	p.wrap(plain, "  ", append(p.room, '.'))
}

// listed separates the next item of a list from what stands before.
func (p *page) listed(dst []byte) []byte {
	if len(dst) == 0 {
		return dst
	}
	return append(dst, ", "...)
}

// alone lists the groups that only one case has, and why the other has not.
func (p *page) alone(title string, ids []group.ID, has, lacks *group.Set) {
	if len(ids) == 0 {
		return
	}
	p.heading(title)
	p.room = p.room[:0]
	for _, id := range ids {
		p.room = p.listed(p.room)
		p.room = append(append(append(p.room, group.Of(id).Title...), ' '), fourDigits(has.Get(id))...)
		switch lacks.State(id) {
		case group.Missing:
			p.room = append(append(append(p.room, " (the other needs "...), lacks.Need(id).Input...), ')')
		case group.OffRange:
			p.room = append(p.room, " (outside its formula in the other)"...)
		}
	}
	p.wrap(plain, "  ", append(p.room, '.'))
}
