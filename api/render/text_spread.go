package render

import (
	"cmp"
	"math"
	"slices"
	"strconv"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/units"
)

// spread shows which inputs are uncertain, how probable each class is, and which
// assumptions hold or fall with them.
func (p *page) spread(a *regime.Answer) {
	s := a.Spread
	if s == nil {
		return
	}
	p.heading("Uncertain inputs")
	for _, at := range s.Inputs {
		lead := left([]byte("   "), at.Path(), idColumn+8)
		p.wrap(plain, string(lead), appendUncertain(p.room[:0], a.Case.At(at), at))
	}
	p.room = appendDraws(p.room[:0], s)
	p.wrap(dim, "   ", p.room)
	if s.Samples == 0 {
		return
	}
	p.likelyClasses(a)
	p.straddling(a)
}

// appendDraws says how the uncertain inputs were sampled.
func appendDraws(dst []byte, s *regime.Spread) []byte {
	dst = append(strconv.AppendInt(append(dst, "What follows is from "...), int64(s.Samples), 10), " draws of them"...)
	if s.Outside > 0 {
		dst = append(strconv.AppendInt(append(dst, "; "...), int64(s.Outside), 10), " more lay outside what the case allows and were left out"...)
	}
	return append(dst, ". ± is one standard deviation above, and one standard error below. Single numbers elsewhere on this page are those at the middles."...)
}

// appendUncertain writes "1.2 m/s ± 0.24 m/s, normal", the second number one standard
// deviation, or "0.002 to 0.02, uniform".
func appendUncertain(dst []byte, q *units.Quantity, at input.Place) []byte {
	k := at.Kind()
	if q.Form == units.Uniform {
		dst = append(units.AppendFormat(dst, q.Low(), k), " to "...)
		return append(units.AppendFormat(dst, q.High(), k), ", uniform"...)
	}
	dst = append(units.AppendFormat(dst, q.Value, k), " ± "...)
	if k == units.Temperature { // a difference, which has no zero to count from
		dst = append(units.AppendNumber(dst, q.Spread, digits), " K"...)
	} else {
		dst = units.AppendFormat(dst, q.Spread, k)
	}
	return append(dst, ", normal"...)
}

// likelyClasses shows a bar a class.
func (p *page) likelyClasses(a *regime.Answer) {
	p.heading("How likely each class is to be the one")
	names := 0
	for _, c := range a.Spread.Classes {
		names = max(names, columns(c.Class.Title)+2)
	}
	const mark, figures, longest = 3, 18, 50
	wide := min(max(p.width-mark-names-figures, 10), longest)
	for _, c := range a.Spread.Classes {
		st, lead := plain, "   "
		if c.Class == a.Recommendation.Class {
			st, lead = strong, " > "
		}
		p.room = left(append(p.room[:0], lead...), c.Class.Title, names)
		p.room = appendBar(p.room, c.Share, wide)
		p.room = appendLikelihood(p.room, c.Probability)
		p.line(st, string(p.room))
	}
}

// appendBar appends a bar that is as full as a share says.
func appendBar(dst []byte, share float64, wide int) []byte {
	full := int(math.Round(share * float64(wide)))
	for i := range wide {
		if i < full {
			dst = append(dst, '=')
		} else {
			dst = append(dst, "·"...)
		}
	}
	return dst
}

// appendLikelihood writes "  51.4 % ± 0.3 %" in columns.
func appendLikelihood(dst []byte, q regime.Probability) []byte {
	var space [16]byte
	dst = right(dst, string(strconv.AppendFloat(space[:0], 100*q.Share, 'f', 1, 64)), 7)
	dst = append(dst, " % ± "...)
	return append(strconv.AppendFloat(dst, 100*q.StandardError, 'f', 1, 64), " %"...)
}

// sure is the probability from which on a verdict is not shown as an open one.
const sure = 0.99

// straddling shows the assumptions whose verdict is not sure.
func (p *page) straddling(a *regime.Answer) {
	list := unsure(a)
	if len(list) == 0 {
		return
	}
	p.heading("Assumptions that hold or fall with them")
	for _, e := range list {
		p.wrap(plain, string(left([]byte("   "), e.ID, idColumn+2)), appendOdds(p.room[:0], a, e))
	}
}

// unsure lists the assumptions of interest whose verdict is not sure, the least
// sure first.
func unsure(a *regime.Answer) []*assumption.Entry {
	type open struct {
		entry *assumption.Entry
		most  float64
	}
	var list []open
	for i, e := range assumption.Catalogue {
		most := 0.0
		for _, v := range a.Spread.Verdicts[i] {
			most = max(most, v.Share)
		}
		if most < sure && a.Findings[i].OfInterest {
			list = append(list, open{e, most})
		}
	}
	slices.SortStableFunc(list, func(x, y open) int { return cmp.Compare(x.most, y.most) })
	entries := make([]*assumption.Entry, len(list))
	for i := range list {
		entries[i] = list[i].entry
	}
	return entries
}

// appendOdds writes "valid 51.4 %, marginal 12.2 %, invalid 36.4 %; error/limit
// 0.55 to 1.3".
func appendOdds(dst []byte, a *regime.Answer, e *assumption.Entry) []byte {
	sep := ""
	for _, v := range verdicts {
		q := a.Spread.Verdicts[e.Index()][v]
		if q.Share == 0 {
			continue
		}
		dst = append(append(append(dst, sep...), v.String()...), ' ')
		if q.Share < 0.0005 {
			dst = append(dst, "under 0.1 %"...)
		} else {
			dst = append(strconv.AppendFloat(dst, 100*q.Share, 'f', 1, 64), " %"...)
		}
		sep = ", "
	}
	q := a.Spread.Utilisations[e.Index()]
	if math.IsNaN(q[1]) {
		return dst
	}
	return appendRange(append(dst, "; error/limit "...), q)
}

// appendRange writes what lies between 5 and 95 %.
func appendRange(dst []byte, q regime.Quantiles) []byte {
	dst = append(units.AppendNumber(dst, q[0], digits), " to "...)
	dst = units.AppendNumber(dst, q[2], digits)
	return append(dst, " (90 % of draws)"...)
}

// appendGroupSpread says within what a group lies, where it varies.
func appendGroupSpread(dst []byte, a *regime.Answer, id group.ID) []byte {
	if a.Spread == nil {
		return dst
	}
	q, known := a.Spread.Groups[id]
	if !known || q[0] == q[2] {
		return dst
	}
	return appendRange(append(dst, "; "...), q)
}
