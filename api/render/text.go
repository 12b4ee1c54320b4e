package render

import (
	"slices"
	"strconv"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/scale"
	"regimed/units"
)

// TextOptions say how a page of text is laid out.
type TextOptions struct {
	Width  int  // columns, from 80 to 160; 0: 96
	Colour bool // with the colours of a terminal
}

const (
	usualWidth    = 96
	leastWidth    = 80
	greatestWidth = 160
)

// AppendText appends the answer as a page for people: what to do first, then
// why, then everything that it rests on. Quantities come in the units of the
// trade, with three or four digits.
func AppendText(dst []byte, a *regime.Answer, o TextOptions) []byte {
	if o.Width == 0 {
		o.Width = usualWidth
	}
	p := &page{dst: dst, width: min(max(o.Width, leastWidth), greatestWidth), colour: o.Colour}
	p.recommendation(a)
	p.ladder(a)
	p.conditions(a)
	p.spread(a)
	p.assumptions(a)
	p.turns(a)
	p.groups(a)
	p.scales(a)
	p.modes(a)
	p.setup(a)
	p.frequencies(a)
	p.warnings(a)
	p.cautions(a)
	p.foot(a)
	return p.dst
}

// recommendation says what to do, in the first lines.
func (p *page) recommendation(a *regime.Answer) {
	r := &a.Recommendation
	p.begin(strong)
	if r.Provisional {
		p.dst = append(p.dst, "Recommended, provisionally: "...)
	} else {
		p.dst = append(p.dst, "Recommended: "...)
	}
	p.dst = appendClass(p.dst, r.Class)
	p.end(strong)
	p.room = append(append(p.room[:0], r.Class.Solves...), '.')
	p.wrap(plain, "  Solves ", p.room)
	p.axes(&r.Axes)
	if r.Beside != nil {
		p.room = append(appendClass(append(p.room[:0], "Beside it, "...), r.Beside), " gives the natural frequencies; the recommended class has none of its own."...)
		p.wrap(plain, "  ", p.room)
	}
	p.subject(a)
}

func (p *page) axes(x *ladder.Axes) {
	p.room = p.room[:0]
	for i := range ladder.AxisList {
		axis := &ladder.AxisList[i]
		if i > 0 {
			p.room = append(p.room, ", "...)
		}
		p.room = appendSpaced(p.room, axis.ID)
		p.room = append(p.room, ": "...)
		p.room = append(p.room, *axis.Of(x)...)
	}
	p.wrap(plain, "  ", p.room)
}

// appendSpaced appends an id with blanks in it.
func appendSpaced(dst []byte, id string) []byte {
	for _, c := range []byte(id) {
		if c == '_' {
			c = ' '
		}
		dst = append(dst, c)
	}
	return dst
}

// subject says which case this is, and what counts in it.
func (p *page) subject(a *regime.Answer) {
	p.blank()
	p.room = p.room[:0]
	if s, ok := textOf(a, kind.Title); ok {
		p.room = append(append(p.room, s...), ", "...)
	}
	p.room = append(p.room, a.Kind.Title...)
	if s, ok := textOf(a, kind.Reference); ok {
		p.room = append(append(append(p.room, " ("...), s...), ')')
	}
	p.wrap(plain, "Case:      ", p.room)
	t := &a.Tolerance
	p.room = append(append(p.room[:0], t.Name...), ": frequency "...)
	p.room = append(appendPercent(p.room, t.Frequency), ", load "...)
	p.room = append(appendPercent(p.room, t.Load), ", response "...)
	p.room = append(appendPercent(p.room, t.Response), ". Of interest:"...)
	sep := " "
	for m := finding.Frequency; m <= finding.Scale; m++ {
		if a.Interest.Has(m) {
			p.room = append(append(p.room, sep...), m.String()...)
			sep = ", "
		}
	}
	p.wrap(plain, "Tolerance: ", append(p.room, '.'))
}

// ladder shows the candidates, cheapest first, and what became of each.
func (p *page) ladder(a *regime.Answer) {
	p.heading("Model classes, cheapest first")
	r := &a.Recommendation
	above := false
	for i := range ladder.Classes {
		c := &ladder.Classes[i]
		switch {
		case c == r.Class:
			p.rung(strong, " > ", c, "recommended")
			above = true
		case !c.Domain.Covers(a.Kind.Name, a.Groups.Traits):
		case above:
			p.rung(dim, " . ", c, "not needed")
		default:
			p.rung(plain, " x ", c, "")
			p.fall(a, c)
		}
	}
}

func (p *page) rung(s style, mark string, c *ladder.Class, outcome string) {
	p.begin(s)
	p.dst = append(p.dst, mark...)
	p.dst = right(p.dst, strconv.Itoa(c.Rank), 2)
	p.dst = append(p.dst, ' ')
	start := len(p.dst)
	p.dst = appendClass(p.dst, c)
	if outcome != "" {
		p.dst = pad(p.dst, max(62-6-columns(string(p.dst[start:])), 2))
		p.dst = append(p.dst, outcome...)
	}
	p.end(s)
}

// fall gives the assumptions that ruled a class out, each with its price.
func (p *page) fall(a *regime.Answer, c *ladder.Class) {
	for i := range a.Recommendation.Rejected {
		r := &a.Recommendation.Rejected[i]
		if r.Class != c {
			continue
		}
		p.room = p.room[:0]
		for j, e := range r.Because {
			if j > 0 {
				p.room = append(p.room, ", "...)
			}
			m := a.Findings[e.Index()].Main()
			p.room = append(append(p.room, e.ID...), ": "...)
			p.room = append(append(p.room, m.Measure.String()...), ' ')
			p.room = appendAmount(p.room, m.Estimate, isShare(a, m))
			p.room = append(p.room, " (limit "...)
			p.room = append(appendAmount(p.room, m.Limit, isShare(a, m)), ')')
		}
		p.wrap(plain, "         ", p.room)
	}
}

// conditions lists what is still to be verified, by what would settle it.
func (p *page) conditions(a *regime.Answer) {
	r := &a.Recommendation
	if len(r.Conditions) == 0 {
		return
	}
	p.heading("On condition that")
	for _, e := range r.Conditions {
		if a.Findings[e.Index()].Verdict == finding.Marginal {
			p.room = appendCondition(p.room[:0], a, e)
			p.wrap(yellow, "  - ", p.room)
		}
	}
	for _, w := range waiting(a) {
		p.room = appendWaitingInput(p.room[:0], &w)
		p.wrap(yellow, "  - ", p.room)
	}
	for _, s := range settledSentences(r) {
		p.wrap(yellow, "  - ", []byte(s))
	}
}

// appendWaitingInput says what waits for a missing input, and how far each holds.
func appendWaitingInput(dst []byte, w *waitingInput) []byte {
	dst = append(append(dst, w.input...), " not given: "...)
	for i := range w.list {
		if i > 0 {
			dst = append(dst, "; "...)
		}
		dst = append(dst, w.list[i].entry.ID...)
		before := len(dst)
		dst = appendHold(dst, w.list[i].hold, " holds ")
		if len(dst) == before {
			dst = append(dst, " waits for it"...)
		}
	}
	return append(dst, '.')
}

// settledSentences say which class an assumption would lead to that turned out
// not to hold, in one sentence a class.
func settledSentences(r *ladder.Recommendation) []string {
	var all []string
	for i := range r.IfSettled {
		c := r.IfSettled[i].Class
		if slices.ContainsFunc(r.IfSettled[:i], func(s ladder.Settled) bool { return s.Class == c }) {
			continue
		}
		var list []*assumption.Entry
		for _, s := range r.IfSettled[i:] {
			if s.Class == c {
				list = append(list, s.Entry)
			}
		}
		dst := appendIDs([]byte("If "), list, " or ")
		dst = append(dst, " turns out not to hold, the class becomes "...)
		all = append(all, string(append(appendClass(dst, c), '.')))
	}
	return all
}

// waitingInput is a missing input with what waits for it, hardest bound first.
type waitingInput struct {
	input string
	list  []waitingEntry
}

type waitingEntry struct {
	entry *assumption.Entry
	hold  hold
}

func waiting(a *regime.Answer) []waitingInput {
	var all []waitingInput
	for _, e := range a.Recommendation.Conditions {
		f := &a.Findings[e.Index()]
		if f.Verdict != finding.Undetermined {
			continue
		}
		for _, h := range holds(nil, a, f) {
			i := inputIndex(all, h.input)
			if i < 0 {
				i = len(all)
				all = append(all, waitingInput{input: h.input})
			}
			all[i].list = append(all[i].list, waitingEntry{e, h})
		}
	}
	for i := range all {
		sortWaiting(all[i].list)
	}
	return all
}

func inputIndex(all []waitingInput, input string) int {
	for i := range all {
		if all[i].input == input {
			return i
		}
	}
	return -1
}

// warnings are about the input.
func (p *page) warnings(a *regime.Answer) {
	if len(a.Warnings) == 0 {
		return
	}
	p.heading("Warnings")
	for i := range a.Warnings {
		w := &a.Warnings[i]
		p.room = p.room[:0]
		if w.Pointer != "" {
			p.room = append(append(p.room, w.Pointer...), ": "...)
		}
		p.room = append(p.room, w.Sentence...)
		p.wrap(yellow, "  - ", p.room)
	}
}

func (p *page) cautions(a *regime.Answer) {
	p.heading("Cautions")
	for i, e := range assumption.Catalogue {
		if e.Hazard != "" && isActive(&a.Findings[i]) {
			p.wrap(red, "  ! ", []byte(e.Hazard))
		}
	}
	p.wrap(plain, "  - ", []byte(standingCaution))
}

func (p *page) foot(a *regime.Answer) {
	p.blank()
	p.room = append(append(p.room[:0], "engine "...), Version...)
	p.room = append(append(p.room, ", catalogue "...), Catalogue()[:12]...)
	p.wrap(dim, "", p.room)
	if a.Case != nil {
		p.line(dim, "case "+a.Case.Digest())
	}
}

// groups lists the dimensionless groups.
func (p *page) groups(a *regime.Answer) {
	p.heading("Dimensionless groups")
	for id := range group.Count {
		if group.Of(id).Core || a.Groups.Has(id) {
			p.group(a, id)
		}
	}
	p.waitingGroups(a)
}

// waitingGroups lists the groups that wait for an input, by input.
func (p *page) waitingGroups(a *regime.Answer) {
	for _, s := range waitingGroups(a) {
		p.wrap(dim, "  ", []byte(s))
	}
}

// waitingGroups names the groups that wait for an input, in one sentence an input.
func waitingGroups(a *regime.Answer) []string {
	waits := func(id group.ID) bool { return !group.Of(id).Core && a.Groups.State(id) == group.Missing }
	var done [group.Count]bool
	var all []string
	for id := range group.Count {
		if !waits(id) || done[id] {
			continue
		}
		need := a.Groups.Need(id).Input
		dst := appendGroupReason(nil, a, id)
		dst = append(dst[:len(dst)-1], ": "...)
		sep := ""
		for other := id; other < group.Count; other++ {
			if waits(other) && a.Groups.Need(other).Input == need {
				done[other] = true
				dst = append(append(dst, sep...), group.Of(other).Title...)
				dst = append(append(append(dst, " ("...), group.Of(other).Symbol...), ')')
				sep = ", "
			}
		}
		all = append(all, string(append(dst, '.')))
	}
	return all
}

const (
	symbolColumn = 11
	valueColumn  = 11
)

func (p *page) group(a *regime.Answer, id group.ID) {
	d := group.Of(id)
	lead := left([]byte("  "), d.Symbol, symbolColumn)
	if !a.Groups.Has(id) {
		lead = left(lead, "-", valueColumn)
		p.room = append(append(p.room[:0], d.Title...), ": "...)
		start := len(p.room)
		p.room = appendGroupReason(p.room, a, id)
		lowerFirst(p.room[start:])
		p.wrap(dim, string(lead), p.room)
		return
	}
	var space [24]byte
	lead = left(lead, string(units.AppendNumber(space[:0], a.Groups.Get(id), 4)), valueColumn)
	p.room = append(append(p.room[:0], d.Title...), ": "...)
	p.room = append(p.room, d.Definition...)
	if b := groupBand(a, id); b != "" {
		p.room = append(append(append(p.room, " ["...), b...), ']')
	}
	p.room = p.with(p.room, a, id)
	p.room = appendGroupSpread(p.room, a, id)
	p.wrap(plain, string(lead), p.room)
}

// with appends the scales that a group is made of: "; U 1.2 m/s, L 25 mm".
func (p *page) with(dst []byte, a *regime.Answer, id group.ID) []byte {
	if a.Groups.State(id) == group.Adopted {
		return append(dst, "; given as a group"...)
	}
	f := formulaOf[id]
	if f == nil {
		return dst
	}
	sep := "; "
	for i, s := range f.From {
		if !a.Scales.Has(s) {
			continue
		}
		dst = append(append(dst, sep...), withKey(f.From, i)...)
		dst = append(dst, " = "...)
		dst = units.AppendFormat(dst, a.Scales.X(s), a.Scales.Value(s).Kind)
		sep = ", "
	}
	return dst
}

// scales lists what nobody gave: the values that a reviewer will ask for.
func (p *page) scales(a *regime.Answer) {
	begun := false
	for id := range scale.Count {
		v := a.Scales.Value(id)
		if v.Origin != scale.Assumed && v.Origin != scale.LookedUp {
			continue
		}
		if !begun {
			p.heading("Assumed or looked up")
			begun = true
		}
		d := scale.Of(id)
		lead := left([]byte("  "), d.Symbol, symbolColumn)
		lead = left(lead, units.Format(v.X, v.Kind), valueColumn+4)
		p.room = append(append(append(p.room[:0], d.Title...), ": "...), v.Origin.String()...)
		if v.Note != "" {
			p.room = append(append(p.room, ", "...), v.Note...)
		}
		p.wrap(plain, string(lead), p.room)
	}
}

// modes lists the modes of a case that gives several, with what each asks for.
func (p *page) modes(a *regime.Answer) {
	if len(a.Modes) == 0 {
		return
	}
	p.heading("Modes")
	for i := range a.Modes {
		m := &a.Modes[i]
		p.room = append(strconv.AppendInt(append(p.room[:0], "  "...), int64(m.Number), 10), ' ')
		p.room = right(p.room, units.Format(m.FrequencyDry, units.Frequency), 16-len(p.room)+4)
		p.room = append(p.room, " dry"...)
		p.room = right(p.room, units.Format(m.FrequencyWet, units.Frequency), 12)
		p.room = append(append(p.room, " wet  "...), m.Class.ID...)
		if m.Worst != nil {
			var space [24]byte
			p.room = append(append(p.room, ", most loaded by "...), m.Worst.ID...)
			p.room = append(append(p.room, " at "...), units.AppendNumber(space[:0], m.Utilisation, digits)...)
		}
		p.line(plain, string(p.room))
	}
}

// setup lists the figures for the next step, the governing ones marked.
func (p *page) setup(a *regime.Answer) {
	if len(a.Setup) == 0 {
		return
	}
	p.heading("Set-up figures")
	for i := range a.Setup {
		f := &a.Setup[i]
		mark := "  "
		if f.Governs {
			mark = "> "
		}
		lead := left([]byte(mark), f.Row.Title, 42)
		lead = append(right(lead, units.Format(f.Value, f.Row.Kind), 12), "  "...)
		p.room = append(append(p.room[:0], f.Row.Rule...), " ["...)
		p.room = append(append(p.room, f.Row.Source.Short...), ']')
		p.wrap(plain, string(lead), p.room)
	}
}

func (p *page) frequencies(a *regime.Answer) {
	list := frequencies(nil, a)
	if len(list) == 0 {
		return
	}
	p.heading("Frequencies")
	wet := a.Scales.X(scale.FrequencyWet)
	for _, f := range list {
		p.room = left(append(p.room[:0], "  "...), f.title, 42)
		p.room = right(p.room, units.Format(f.value, units.Frequency), 12)
		if f.id != "wet" && wet > 0 {
			var space [24]byte
			p.room = right(p.room, string(units.AppendNumber(space[:0], f.value/wet, digits)), 10)
			p.room = append(p.room, " × wet"...)
		}
		p.line(plain, string(p.room))
	}
}
