package render

import (
	"strconv"
	"strings"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/group"
	"regimed/units"
)

// change is a row of what would change the answer.
type change struct{ Input, Value, Verdict, Class string }

// driverRow names the inputs that a finding changes with most.
type driverRow struct{ Finding, Inputs string }

// varied is what varying the inputs adds to a report.
type varied struct {
	Explored bool // what would change the answer was asked for
	Changes  []change
	Drivers  []driverRow

	Uncertain []pair // the inputs that are
	Draws     string // how they were sampled
	Likely    []likelyRow
	Odds      []pair // the findings that hold or fall with the uncertain inputs
}

// likelyRow says how probable it is that a class is the recommended one. Bar is
// the share of it in per cent, for drawing.
type likelyRow struct {
	Title, ID, Probability, StandardError string
	Bar                                   float64
	Recommended                           bool
}

// Sentences about what varying the inputs showed.
const (
	noTurn      = "No input by itself, within two decades either way and what is plausible."
	turnsOrder  = "Each input by itself, the others as given; the nearest turning points first."
	driversRule = "Error/limit changes by so many per cent for one per cent of an input:"
)

func newVaried(a *regime.Answer) varied {
	v := varied{Explored: a.Turns != nil, Changes: changes(a)}
	if v.Explored {
		v.Drivers = driverRows(a)
	}
	if a.Spread != nil {
		v.spread(a)
	}
	return v
}

// changes are the turning points, nearest first. An answer that was not explored
// has none.
func changes(a *regime.Answer) []change {
	var list []change
	for i := range a.Turns {
		t := &a.Turns[i]
		list = append(list, change{Input: t.Place.Path(), Value: string(appendTurnValue(nil, a, t)),
			Verdict: string(appendWhatTurns(nil, t)), Class: string(appendClass(nil, t.Class))})
	}
	return list
}

// appendTurnValue writes "above 1.12 m/s (+12 %)".
func appendTurnValue(dst []byte, a *regime.Answer, t *regime.Turn) []byte {
	side := "below "
	if t.Up {
		side = "above "
	}
	dst = appendInputValue(append(dst, side...), a, t.Place, t.Value)
	if change := appendChange(nil, a, t); len(change) > 0 {
		dst = append(append(append(dst, " ("...), change...), ')')
	}
	return dst
}

// driverRows are the drivers of the findings on which the class turns.
func driverRows(a *regime.Answer) []driverRow {
	var rows []driverRow
	for _, e := range deciding(a, a.Turns[:min(len(a.Turns), mostTurns)]) {
		if list := a.Drivers[e.Index()]; len(list) > 0 {
			rows = append(rows, driverRow{e.ID, string(appendDriven(nil, list))})
		}
	}
	return rows
}

// appendDriven writes "flow.speed 2, structure.diameter -1".
func appendDriven(dst []byte, list []regime.Driver) []byte {
	for i, d := range list {
		if i > 0 {
			dst = append(dst, ", "...)
		}
		dst = append(append(dst, d.Place.Path()...), ' ')
		dst = units.AppendNumber(dst, d.Sensitivity, digits)
	}
	return dst
}

func (v *varied) spread(a *regime.Answer) {
	for _, at := range a.Spread.Inputs {
		v.Uncertain = append(v.Uncertain, pair{at.Path(), string(appendUncertain(nil, a.Case.At(at), at))})
	}
	v.Draws = string(appendDraws(nil, a.Spread))
	if a.Spread.Samples == 0 {
		return
	}
	for _, c := range a.Spread.Classes {
		v.Likely = append(v.Likely, likelyRow{Title: c.Class.Title, ID: c.Class.ID, Probability: percentage(c.Share), StandardError: percentage(c.StandardError),
			Bar: round(100 * c.Share), Recommended: c.Class == a.Recommendation.Class})
	}
	for _, e := range unsure(a) {
		v.Odds = append(v.Odds, pair{e.ID, string(appendOdds(nil, a, e))})
	}
}

// percentage writes a probability with one digit after the point.
func percentage(share float64) string {
	return strconv.FormatFloat(100*share, 'f', 1, 64) + " %"
}

// groupSpread says between which values 90 % of a group's draws lie, where it
// varies: "9.1e4 to 1.3e5".
func groupSpread(a *regime.Answer, id group.ID) string {
	s := string(appendGroupSpread(nil, a, id))
	s, _ = strings.CutPrefix(s, "; ")
	s, _ = strings.CutSuffix(s, " (90 % of draws)")
	return s
}

// hasSpreads reports whether a group of the report varies.
func (r *report) hasSpreads() bool {
	for i := range r.Groups {
		if r.Groups[i].Spread != "" {
			return true
		}
	}
	return false
}

// csvVaried are the rows of what varying the inputs adds.
func csvVaried(a *regime.Answer) []csvRow {
	rows := csvTurns(a)
	for i := range a.Drivers {
		if _, judged := a.Findings[i].Utilisation(); !judged {
			continue
		}
		for _, d := range a.Drivers[i] {
			rows = append(rows, csvRow{part: "driver", id: d.Place.Path(), value: csvNumber(d.Sensitivity), unit: "1", finding: assumption.Catalogue[i].ID})
		}
	}
	if a.Spread == nil {
		return rows
	}
	return append(rows, csvSpread(a)...)
}

func csvTurns(a *regime.Answer) []csvRow {
	var rows []csvRow
	for i := range a.Turns {
		t := &a.Turns[i]
		row := csvRow{part: "turn", id: t.Place.Path(), value: csvNumber(t.Value), unit: t.Place.Kind().SI(), factor: csvNumber(t.Factor),
			class: t.Class.ID, direction: direction(t), because: string(appendTurnSentence(nil, a, t))}
		if t.Entry != nil {
			row.finding, row.verdict = t.Entry.ID, t.Verdict.String()
		}
		if isGauge(a, t.Place) {
			row.basis = "gauge"
		}
		rows = append(rows, row)
	}
	return rows
}

// csvSpread are the uncertain inputs, how many draws were judged and how many
// left out, and the probabilities.
func csvSpread(a *regime.Answer) []csvRow {
	s := a.Spread
	var rows []csvRow
	for _, at := range s.Inputs {
		q := a.Case.At(at)
		rows = append(rows, csvRow{part: "uncertain", id: at.Path(), value: csvNumber(q.Value), unit: at.Kind().SI(), spread: csvNumber(q.Spread), basis: q.Form.String(),
			because: string(appendUncertain(nil, q, at))})
	}
	rows = append(rows, csvRow{part: "answer", id: "samples", value: strconv.Itoa(s.Samples), unit: "1"}, csvRow{part: "answer", id: "outside", value: strconv.Itoa(s.Outside), unit: "1"})
	if s.Samples == 0 {
		return rows
	}
	probable := func(p regime.Probability) csvRow {
		return csvRow{part: "probability", value: csvNumber(p.Share), unit: "1", deviation: csvNumber(p.StandardError)}
	}
	for _, c := range s.Classes {
		row := probable(c.Probability)
		row.id, row.title, row.class = c.Class.ID, c.Class.Title, c.Class.ID
		rows = append(rows, row)
	}
	for i, e := range assumption.Catalogue {
		for j, v := range verdicts {
			if p := s.Verdicts[i][v]; j < 3 || p.Share > 0 {
				row := probable(p)
				row.id, row.title, row.finding, row.verdict = e.ID, e.Title, e.ID, v.String()
				rows = append(rows, row)
			}
		}
	}
	return rows
}

// quantiles fills in the values below which 5, 50 and 95 % of the draws lie.
func (r *csvRow) quantiles(q regime.Quantiles) {
	r.p05, r.p50, r.p95 = csvNumber(q[0]), csvNumber(q[1]), csvNumber(q[2])
}
