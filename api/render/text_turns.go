package render

import (
	"slices"
	"strconv"

	"regimed/regime"
	"regimed/regime/assumption"
)

// Lines of a page on what would change the answer.
const (
	mostTurns   = 8
	mostDriven  = 6
	changeWidth = 7
	valueWidth  = 11
)

// turns shows the nearest values of single inputs at which another class is
// recommended, and what drives the findings that decide.
func (p *page) turns(a *regime.Answer) {
	if a.Turns == nil {
		return
	}
	p.heading("What would change the answer")
	if len(a.Turns) == 0 {
		p.wrap(dim, "   ", []byte(noTurn))
	} else {
		p.wrap(dim, "   ", []byte(turnsOrder))
	}
	shown := a.Turns[:min(len(a.Turns), mostTurns)]
	wide := 0
	for i := range shown {
		wide = max(wide, columns(shown[i].Place.Path()))
	}
	for i := range shown {
		p.turn(a, &shown[i], wide)
	}
	if more := len(a.Turns) - len(shown); more > 0 {
		p.room = strconv.AppendInt(append(p.room[:0], "and "...), int64(more), 10)
		p.wrap(dim, "   ", append(p.room, " further off."...))
	}
	p.drivers(a, shown)
}

// turn shows one turning point in a line, or two.
func (p *page) turn(a *regime.Answer, t *regime.Turn, wide int) {
	lead := left([]byte("   "), t.Place.Path(), wide+2)
	lead = right(lead, string(appendChange(nil, a, t)), changeWidth)
	to := "  to "
	if t.Value == 0 {
		to = "  from "
	}
	lead = left(append(lead, to...), string(appendInputValue(nil, a, t.Place, t.Value)), valueWidth)
	p.room = append(append(p.room[:0], "→ "...), t.Class.ID...)
	if t.Entry != nil {
		p.room = append(append(append(p.room, ": "...), t.Entry.ID...), ' ')
		p.room = append(p.room, t.Verdict.String()...)
	}
	p.wrap(plain, string(lead), p.room)
}

// drivers names, for the findings that turn and those that decide as it is, the
// inputs that they change with most.
func (p *page) drivers(a *regime.Answer, shown []regime.Turn) {
	begun := false
	for _, e := range deciding(a, shown) {
		list := a.Drivers[e.Index()]
		if len(list) == 0 {
			continue
		}
		if !begun {
			p.wrap(dim, "   ", []byte(driversRule))
			begun = true
		}
		p.room = appendDriven(p.room[:0], list)
		p.wrap(plain, string(left([]byte("   "), e.ID, idColumn)), p.room)
	}
}

// deciding lists the findings on which the class turns, those shown as turning
// first, then the ones that rule out cheaper classes.
func deciding(a *regime.Answer, shown []regime.Turn) []*assumption.Entry {
	var list []*assumption.Entry
	add := func(e *assumption.Entry) {
		if e != nil && len(list) < mostDriven && !slices.Contains(list, e) {
			list = append(list, e)
		}
	}
	for i := range shown {
		add(shown[i].Entry)
	}
	for i := range a.Recommendation.Rejected {
		for _, e := range a.Recommendation.Rejected[i].Because {
			add(e)
		}
	}
	return list
}
