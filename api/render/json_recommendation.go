package render

import (
	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/ladder"
)

func appendRecommendation(dst []byte, a *regime.Answer) []byte {
	r := &a.Recommendation
	dst = append(dst, '{')
	dst = member(dst, "class", r.Class.ID)
	dst = member(dst, "title", r.Class.Title)
	dst = number(dst, "rank", float64(r.Class.Rank))
	dst = member(dst, "solves", r.Class.Solves)
	dst = flag(dst, "provisional", r.Provisional)
	dst = append(name(dst, "axes"), '{')
	for i := range ladder.AxisList {
		x := &ladder.AxisList[i]
		dst = member(dst, x.ID, *x.Of(&r.Axes))
	}
	dst = append(dst, '}')
	dst = appendJustification(name(dst, "justification"), a)
	dst = append(name(dst, "conditions"), '[')
	for _, e := range r.Conditions {
		var start int
		dst, start = open(comma(dst))
		dst = seal(appendCondition(dst, a, e), start)
	}
	dst = append(dst, ']')
	dst = appendRejections(name(dst, "rejected"), a)
	dst = appendSettled(name(dst, "if_settled"), a)
	if r.Beside != nil {
		dst = append(name(dst, "beside"), '{')
		dst = member(dst, "class", r.Beside.ID)
		dst = append(member(dst, "title", r.Beside.Title), '}')
	}
	return append(appendClassProbabilities(dst, a), '}')
}

func appendJustification(dst []byte, a *regime.Answer) []byte {
	var room [64]*assumption.Entry
	dst, start := open(append(dst, '['))
	dst = seal(appendClassSentence(dst, &a.Recommendation), start)
	for _, e := range held(room[:0], a) {
		dst, start = open(comma(dst))
		dst = seal(appendHeld(dst, a, e), start)
	}
	if list := moot(room[:0], a); len(list) > 0 {
		dst, start = open(comma(dst))
		dst = seal(appendMoot(dst, list), start)
	}
	return append(dst, ']')
}

func appendRejections(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '[')
	for i := range a.Recommendation.Rejected {
		r := &a.Recommendation.Rejected[i]
		dst = append(comma(dst), '{')
		dst = member(dst, "class", r.Class.ID)
		dst = member(dst, "title", r.Class.Title)
		dst = append(name(dst, "because"), '[')
		for _, e := range r.Because {
			dst = element(dst, e.ID)
		}
		dst = append(dst, ']')
		var start int
		dst, start = open(name(dst, "sentence"))
		dst = append(seal(appendRejected(dst, a, r), start), '}')
	}
	return append(dst, ']')
}

func appendSettled(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '[')
	for i := range a.Recommendation.IfSettled {
		s := &a.Recommendation.IfSettled[i]
		var room [6]hold
		list := holds(room[:0], a, &a.Findings[s.Entry.Index()])
		dst = append(comma(dst), '{')
		dst = appendInputs(name(dst, "needs"), list)
		dst = member(dst, "finding", s.Entry.ID)
		dst = append(member(dst, "would_become", s.Class.ID), '}')
	}
	return append(dst, ']')
}
