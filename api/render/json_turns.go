package render

import (
	"regimed/regime"
	"regimed/regime/input"
	"regimed/units"
)

// appendTurns lists where the recommended class changes, nearest first.
func appendTurns(dst []byte, a *regime.Answer) []byte {
	dst = append(dst, '[')
	for i := range a.Turns {
		dst = append(appendTurn(append(comma(dst), '{'), a, &a.Turns[i]), '}')
	}
	return append(dst, ']')
}

func appendTurn(dst []byte, a *regime.Answer, t *regime.Turn) []byte {
	dst = member(dst, "input", t.Place.Path())
	dst = member(dst, "pointer", t.Place.Pointer())
	dst = member(dst, "direction", direction(t))
	dst = number(dst, "value", t.Value)
	dst = member(dst, "unit", t.Place.Kind().SI())
	if isGauge(a, t.Place) {
		dst = flag(dst, "gauge", true)
	}
	dst = number(dst, "factor", t.Factor)
	if t.Entry != nil {
		dst = member(dst, "finding", t.Entry.ID)
		dst = member(dst, "verdict", t.Verdict.String())
	} else {
		dst = append(name(dst, "finding"), "null"...)
		dst = append(name(dst, "verdict"), "null"...)
	}
	dst = member(dst, "class", t.Class.ID)
	dst, start := open(name(dst, "sentence"))
	return seal(appendTurnSentence(dst, a, t), start)
}

func direction(t *regime.Turn) string {
	if t.Up {
		return "up"
	}
	return "down"
}

// isGauge reports whether a pressure was given as a gauge pressure: its values
// then are such too.
func isGauge(a *regime.Answer, p input.Place) bool {
	if p.Kind() != units.Pressure || a.Case == nil {
		return false
	}
	q := a.Case.At(p)
	return q != nil && q.Gauge
}

// appendDrivers appends the inputs that drive the i-th finding most, where the
// case was explored and the finding has a utilisation.
func appendDrivers(dst []byte, a *regime.Answer, i int) []byte {
	if a.Drivers == nil {
		return dst
	}
	if _, judged := a.Findings[i].Utilisation(); !judged {
		return dst
	}
	dst = append(name(dst, "drivers"), '[')
	for _, d := range a.Drivers[i] {
		dst = append(comma(dst), '{')
		dst = member(dst, "input", d.Place.Path())
		dst = append(number(dst, "sensitivity", d.Sensitivity), '}')
	}
	return append(dst, ']')
}
