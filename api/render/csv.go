package render

import (
	"bytes"
	"encoding/csv"
	"math"
	"strconv"
	"strings"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/scale"
)

// CSVColumns are the columns of the table that [CSV] writes. What a row has no
// figure for is empty.
//
//	part          answer, class, axis, condition, finding, estimate, criterion, group,
//	              scale, setup, frequency, mode, turn, driver, uncertain, probability,
//	              warning or caution
//	id, title     of the row's subject; of a turn, a driver and an uncertain input
//	              the input
//	value, unit   in SI units, as in JSON; of a finding the estimate, of a driver the
//	              sensitivity, of a probability the share of the draws
//	limit, utilisation, factor, margin, verdict, of_interest, measure, basis
//	              of a finding, or of an estimate beside the one that governs. Of a
//	              turn: the factor on the value of the case, the verdict that the
//	              finding turns to, and "gauge" as basis of a gauge pressure. Of a
//	              probability the verdict, of an uncertain input the form as basis
//	because       a sentence: reason, rule or origin
//	source        short
//	p05, p50, p95 of a group and of a finding's utilisation, where inputs are
//	              uncertain: the values below which 5, 50 and 95 % of the draws lie
//	spread        of an uncertain input: one standard deviation, or half the width
//	standard_error
//	              of a probability
//	finding, class
//	              of a turn: what turns, and the class that is recommended beyond;
//	              of a probability one of them, whose it is; of a driver the finding
//	direction     of a turn: up or down
var CSVColumns = []string{"part", "id", "title", "value", "unit", "limit", "utilisation", "factor", "margin", "verdict", "of_interest", "measure", "basis", "because", "source",
	"p05", "p50", "p95", "spread", "standard_error", "finding", "class", "direction"}

// csvRow is a row of the table, in the order of the columns.
type csvRow struct {
	part, id, title, value, unit       string
	limit, utilisation, factor, margin string
	verdict, interest, measure, basis  string
	because, source                    string
	p05, p50, p95, spread, deviation   string
	finding, class, direction          string
}

func (r *csvRow) cells() []string {
	return []string{r.part, r.id, r.title, r.value, r.unit, r.limit, r.utilisation, r.factor, r.margin, r.verdict, r.interest, r.measure, r.basis, r.because, r.source,
		r.p05, r.p50, r.p95, r.spread, r.deviation, r.finding, r.class, r.direction}
}

// CSV returns the answer as one table by RFC 4180, with the columns of
// [CSVColumns]. Numbers are those of JSON, digit by digit. A text of the caller's
// that a spreadsheet would take for a formula has an apostrophe before it.
func CSV(a *regime.Answer) ([]byte, error) {
	var b bytes.Buffer
	w := csv.NewWriter(&b)
	w.UseCRLF = true
	rows := [][]string{CSVColumns}
	for _, list := range [][]csvRow{csvHead(a), csvFindings(a), csvGroups(a), csvScales(a), csvFigures(a), csvVaried(a), csvNotes(a)} {
		for i := range list {
			rows = append(rows, list[i].cells())
		}
	}
	err := w.WriteAll(rows)
	return b.Bytes(), err
}

// csvNumber writes a number as JSON does; what has no value is empty.
func csvNumber(x float64) string {
	switch {
	case math.IsNaN(x) || math.IsInf(x, 0):
		return ""
	case x == math.Trunc(x) && math.Abs(x) < 1e15:
		return strconv.FormatInt(int64(x), 10)
	}
	if m := math.Abs(x); m < 1e-6 || m >= 1e15 {
		return strconv.FormatFloat(x, 'e', -1, 64)
	}
	return strconv.FormatFloat(x, 'f', -1, 64)
}

// csvText is a text of the caller's in one line that no spreadsheet computes.
func csvText(s string) string {
	s = oneLine(s)
	if s != "" && strings.ContainsRune("=+-@", rune(s[0])) {
		return "'" + s
	}
	return s
}

// oneLine is a text of the caller's without line breaks and control characters.
func oneLine(s string) string {
	return strings.Map(func(r rune) rune {
		if r == '\n' || r == '\r' || r == '\t' {
			return ' '
		}
		return harmless(r)
	}, strings.ToValidUTF8(s, "\uFFFD"))
}

func csvHead(a *regime.Answer) []csvRow {
	title, _ := textOf(a, kind.Title)
	reference, _ := textOf(a, kind.Reference)
	digest := ""
	if a.Case != nil {
		digest = a.Case.Digest()
	}
	x := &a.Recommendation
	rows := []csvRow{
		{part: "answer", id: "title", title: csvText(title)},
		{part: "answer", id: "reference", title: csvText(reference)},
		{part: "answer", id: "kind", title: a.Kind.Name},
		{part: "answer", id: "digest", title: digest},
		{part: "answer", id: "engine", title: Version},
		{part: "answer", id: "catalogue", title: Catalogue()},
		{part: "answer", id: "study", because: "Tolerance " + studyText(a)},
	}
	chosen := csvRow{part: "class", id: x.Class.ID, title: x.Class.Title, value: strconv.Itoa(x.Class.Rank), verdict: "recommended", because: string(appendClassSentence(nil, x))}
	if x.Provisional {
		chosen.verdict = "recommended provisionally"
	}
	rows = append(rows, chosen)
	if x.Beside != nil {
		rows = append(rows, csvRow{part: "class", id: x.Beside.ID, title: x.Beside.Title, value: strconv.Itoa(x.Beside.Rank), verdict: "beside"})
	}
	for i := range x.Rejected {
		r := &x.Rejected[i]
		rows = append(rows, csvRow{part: "class", id: r.Class.ID, title: r.Class.Title, value: strconv.Itoa(r.Class.Rank), verdict: "rejected", because: string(appendRejected(nil, a, r))})
	}
	for i := range ladder.AxisList {
		axis := &ladder.AxisList[i]
		rows = append(rows, csvRow{part: "axis", id: axis.ID, title: *axis.Of(&x.Axes)})
	}
	for _, e := range x.Conditions {
		rows = append(rows, csvRow{part: "condition", id: e.ID, title: e.Title, because: string(appendCondition(nil, a, e))})
	}
	return rows
}

func csvFindings(a *regime.Answer) []csvRow {
	var rows []csvRow
	for i, e := range assumption.Catalogue {
		f := &a.Findings[i]
		row := csvRow{part: "finding", id: e.ID, title: e.Title, verdict: f.Verdict.String(), interest: strconv.FormatBool(f.OfInterest), because: string(appendBecause(nil, a, f))}
		if m := f.Main(); m != nil {
			row.estimate(m)
		}
		if s := a.Spread; s != nil && s.Samples > 0 {
			row.quantiles(s.Utilisations[i])
		}
		rows = append(rows, row)
		for j := range f.Parts() {
			if j != int(f.Governing) {
				rows = append(rows, csvPart(a, e, &f.Parts()[j]))
			}
		}
		for _, p := range f.Published() {
			c := p.Criterion
			row := csvRow{part: "criterion", id: c.ID, title: c.Standard + ", " + c.Clause, verdict: p.Verdict.String(), limit: "1", utilisation: csvNumber(p.Utilisation), because: c.Formula}
			if c.Source != nil {
				row.source = string(appendSource(nil, c.Source))
			}
			rows = append(rows, row)
		}
	}
	return rows
}

func csvPart(a *regime.Answer, e *assumption.Entry, p *finding.Part) csvRow {
	verdict := finding.Undetermined
	if !p.Waits {
		verdict = finding.Judge(p.Utilisation, p.Factor, p.Inner)
	}
	row := csvRow{part: "estimate", id: e.ID, title: e.Title, verdict: verdict.String(), interest: strconv.FormatBool(a.Interest.Has(p.Measure)), because: string(appendPartBecause(nil, a, p))}
	row.estimate(p)
	return row
}

// estimate fills in the figures of an estimate.
func (r *csvRow) estimate(p *finding.Part) {
	r.unit, r.limit, r.factor = "1", csvNumber(p.Limit), csvNumber(p.Factor)
	r.measure, r.basis = p.Measure.String(), p.Basis.String()
	if p.Source != nil {
		r.source = string(appendSource(nil, p.Source))
	}
	if !p.Waits {
		r.value, r.utilisation, r.margin = csvNumber(p.Estimate), csvNumber(p.Utilisation), csvNumber(finding.Margin(p.Utilisation))
	}
}

func csvGroups(a *regime.Answer) []csvRow {
	var rows []csvRow
	for id := range group.Count {
		if !shownGroup(a.Groups, id) {
			continue
		}
		d := group.Of(id)
		row := csvRow{part: "group", id: d.ID, title: d.Title, value: csvNumber(a.Groups.Get(id)), unit: "1", because: d.Symbol + " = " + d.Definition}
		if !a.Groups.Has(id) {
			row.because = string(appendGroupReason(nil, a, id))
		}
		if a.Spread != nil {
			if q, known := a.Spread.Groups[id]; known {
				row.quantiles(q)
			}
		}
		rows = append(rows, row)
	}
	return rows
}

func csvScales(a *regime.Answer) []csvRow {
	var rows []csvRow
	for id := range scale.Count {
		if !a.Scales.Has(id) {
			continue
		}
		v := a.Scales.Value(id)
		row := csvRow{part: "scale", id: scale.Of(id).ID, title: scale.Of(id).Title, value: csvNumber(v.X), unit: v.Kind.SI(), because: v.Origin.String()}
		if v.Note != "" {
			row.because += ", " + v.Note
		}
		rows = append(rows, row)
	}
	return rows
}

func csvFigures(a *regime.Answer) []csvRow {
	var rows []csvRow
	for i := range a.Setup {
		f := &a.Setup[i]
		row := csvRow{part: "setup", id: f.Row.ID, title: f.Row.Title, value: csvNumber(f.Value), unit: f.Row.Kind.SI(), because: f.Row.Rule, source: string(appendSource(nil, f.Row.Source))}
		if f.Governs {
			row.verdict = "governs"
		}
		rows = append(rows, row)
	}
	for _, f := range frequencies(nil, a) {
		rows = append(rows, csvRow{part: "frequency", id: f.id, title: f.title, value: csvNumber(f.value), unit: "Hz"})
	}
	for i := range a.Modes {
		m := &a.Modes[i]
		n := strconv.Itoa(m.Number)
		rows = append(rows, csvRow{part: "mode", id: n, title: "dry frequency", value: csvNumber(m.FrequencyDry), unit: "Hz"},
			csvRow{part: "mode", id: n, title: "wet frequency", value: csvNumber(m.FrequencyWet), unit: "Hz", verdict: m.Class.ID})
	}
	return rows
}

func csvNotes(a *regime.Answer) []csvRow {
	var rows []csvRow
	for i := range a.Warnings {
		w := &a.Warnings[i]
		rows = append(rows, csvRow{part: "warning", id: string(w.Code), title: csvText(w.Pointer), because: csvText(w.Sentence)})
	}
	rows = append(rows, csvRow{part: "caution", because: standingCaution})
	for i, e := range assumption.Catalogue {
		if e.Hazard != "" && isActive(&a.Findings[i]) {
			rows = append(rows, csvRow{part: "caution", id: e.ID, because: e.Hazard})
		}
	}
	return rows
}
