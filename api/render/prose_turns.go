package render

import (
	"math"

	"regimed/regime"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/units"
)

// appendTurnSentence says what happens at a turning point.
func appendTurnSentence(dst []byte, a *regime.Answer, t *regime.Turn) []byte {
	side := "Below "
	if t.Up {
		side = "Above "
	}
	dst = append(append(append(dst, side...), t.Place.Path()...), " = "...)
	dst = appendInputValue(dst, a, t.Place, t.Value)
	if change := appendChange(nil, a, t); len(change) > 0 {
		dst = append(append(append(dst, " ("...), change...), ')')
	}
	dst = append(dst, ", "...)
	dst = append(appendWhatTurns(dst, t), " and the recommended class becomes "...)
	return append(appendClass(dst, t.Class), '.')
}

// appendWhatTurns names the finding and its new verdict, or says that the domain
// changes.
func appendWhatTurns(dst []byte, t *regime.Turn) []byte {
	if t.Entry == nil {
		return append(dst, "other classes come into question"...)
	}
	dst = append(append(dst, t.Entry.ID...), ' ')
	if t.Verdict == finding.NotApplicable {
		return append(dst, "no longer applies"...)
	}
	return append(append(dst, "turns "...), t.Verdict.String()...)
}

// appendInputValue writes a value of an input as people do. Numbers of the
// tolerance are shares.
func appendInputValue(dst []byte, a *regime.Answer, p input.Place, x float64) []byte {
	if p.Field.Of == "tolerance" {
		return appendPercent(dst, x)
	}
	dst = units.AppendFormat(dst, x, p.Kind())
	if isGauge(a, p) {
		dst = append(dst, " gauge"...)
	}
	return dst
}

// appendChange says how far a value lies from the one of the case: by a
// percentage, by a factor where that is more than a doubling or a halving, and
// by a difference for what counts from no zero of its own, or in whole numbers.
// Nothing where the case has a zero.
func appendChange(dst []byte, a *regime.Answer, t *regime.Turn) []byte {
	switch {
	case math.IsNaN(t.Factor):
		return dst
	case byDifference(t.Place):
		return appendDifference(dst, a, t)
	case t.Factor >= 2:
		return units.AppendNumber(append(dst, "×"...), t.Factor, digits)
	case t.Factor <= 0.5:
		return units.AppendNumber(append(dst, "÷"...), 1/t.Factor, digits)
	case t.Factor > 1:
		dst = append(dst, '+')
	}
	return append(units.AppendNumber(dst, 100*(t.Factor-1), digits), " %"...)
}

func byDifference(p input.Place) bool {
	return p.Kind() == units.Temperature || p.Kind() == units.Angle || p.Field.Type == input.Integer
}

func appendDifference(dst []byte, a *regime.Answer, t *regime.Turn) []byte {
	d := t.Value - a.Case.At(t.Place).Value
	if d > 0 {
		dst = append(dst, '+')
	}
	if t.Place.Kind() == units.Temperature {
		return append(units.AppendNumber(dst, d, digits), " K"...)
	}
	return units.AppendFormat(dst, d, t.Place.Kind())
}
