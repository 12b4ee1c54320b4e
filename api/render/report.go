package render

import (
	"strconv"
	"strings"

	"regimed/api/render/marginchart"
	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/scale"
	"regimed/units"
)

// report is an answer in words and figures, as HTML and Markdown lay it out. Its
// texts are plain: whoever lays it out escapes them.
type report struct {
	Title, Reference, Kind string
	Lead                   string // "Recommended", or that provisionally
	Class, ID, Solves      string
	Why, Beside            string
	Axes                   []pair
	Study                  string
	Rungs                  []rung
	Conditions             []string
	varied
	Findings           []findingRow
	Moot               []string
	MootIDs            string // the same without reasons
	Criteria           []criterionRow
	Groups             []groupRow
	WaitingGroups      []string
	Scales             []scaleRow
	Modes              []modeRow
	Setup              []setupRow
	Frequencies        []frequencyRow
	Warnings, Hazards  []string
	Caution            string
	Digest             string
	Version, Catalogue string
}

type pair struct{ Name, Value string }

// rung is a class on the ladder, and what became of it.
type rung struct {
	Rank, Title, ID, Outcome string
	Recommended, Fell        bool
	Reasons                  []string
}

type findingRow struct {
	ID, Title, Verdict, Mark    string
	Measure, Estimate, Limit    string
	Utilisation, Factor, Margin string
	Because, Source             string
	Hazard, Aside, Waits        bool
}

type criterionRow struct{ Finding, Criterion, Clause, Utilisation, Verdict, Picked string }

type groupRow struct {
	Symbol, Title, Value string
	Formula, Rest        string // the definition: its formula, and what that means
	Band, With, Reason   string
	Spread               string // what 90 % of the draws lie between
}

type scaleRow struct{ Symbol, Title, Value, Origin string }

type modeRow struct{ Number, Dry, Wet, Class, Worst, Utilisation string }

type setupRow struct {
	Title, Value, Rule, Source string
	Governs                    bool
}

type frequencyRow struct{ Title, Value, Ratio string }

// newReport gathers everything that a reader may ask for.
func newReport(a *regime.Answer) *report {
	r := &report{Kind: a.Kind.Title, Caution: standingCaution, Version: Version, Catalogue: Catalogue()}
	r.Title, _ = textOf(a, kind.Title)
	r.Reference, _ = textOf(a, kind.Reference)
	if a.Case != nil {
		r.Digest = a.Case.Digest()
	}
	r.recommendation(a)
	r.rungs(a)
	r.conditions(a)
	r.varied = newVaried(a)
	r.findings(a)
	r.Moot = mootSentences(a)
	r.MootIDs = strings.Join(mootIDs(a), ", ")
	r.groups(a)
	r.WaitingGroups = waitingGroups(a)
	r.scales(a)
	r.figures(a)
	for i := range a.Warnings {
		r.Warnings = append(r.Warnings, warningText(&a.Warnings[i]))
	}
	for i, e := range assumption.Catalogue {
		if e.Hazard != "" && isActive(&a.Findings[i]) {
			r.Hazards = append(r.Hazards, e.Hazard)
		}
	}
	return r
}

func warningText(w *kind.Warning) string {
	if w.Pointer == "" {
		return w.Sentence
	}
	return w.Pointer + ": " + w.Sentence
}

func (r *report) recommendation(a *regime.Answer) {
	x := &a.Recommendation
	r.Lead = "Recommended"
	if x.Provisional {
		r.Lead = "Recommended, provisionally"
	}
	r.Class, r.ID, r.Solves = x.Class.Title, x.Class.ID, x.Class.Solves
	r.Why = string(appendClassSentence(nil, x))
	if x.Beside != nil {
		r.Beside = "Beside it, " + string(appendClass(nil, x.Beside)) + " gives the natural frequencies; the recommended class has none of its own."
	}
	for i := range ladder.AxisList {
		axis := &ladder.AxisList[i]
		r.Axes = append(r.Axes, pair{string(appendSpaced(nil, axis.ID)), *axis.Of(&x.Axes)})
	}
	r.Study = studyText(a)
}

// studyText says what is tolerated and what counts.
func studyText(a *regime.Answer) string {
	t := &a.Tolerance
	dst := append([]byte(t.Name), ": frequency "...)
	dst = append(appendPercent(dst, t.Frequency), ", load "...)
	dst = append(appendPercent(dst, t.Load), ", response "...)
	dst = append(appendPercent(dst, t.Response), ". Of interest:"...)
	sep := " "
	for m := finding.Frequency; m <= finding.Scale; m++ {
		if a.Interest.Has(m) {
			dst = append(append(dst, sep...), m.String()...)
			sep = ", "
		}
	}
	if ids := a.Picked.IDs(); ids != "" {
		dst = append(append(dst, ". Criteria picked: "...), ids...)
	}
	return string(append(dst, '.'))
}

// rungs are the candidates, cheapest first.
func (r *report) rungs(a *regime.Answer) {
	above := false
	for i := range ladder.Classes {
		c := &ladder.Classes[i]
		row := rung{Rank: strconv.Itoa(c.Rank), Title: c.Title, ID: c.ID}
		switch {
		case c == a.Recommendation.Class:
			row.Outcome, row.Recommended, above = "recommended", true, true
		case !c.Domain.Covers(a.Kind.Name, a.Groups.Traits):
			continue
		case above:
			row.Outcome = "not needed"
		default:
			row.Outcome, row.Fell = "ruled out", true
			row.Reasons = reasons(a, c)
		}
		r.Rungs = append(r.Rungs, row)
	}
}

// reasons give the assumptions that ruled a class out, each with its price.
func reasons(a *regime.Answer, c *ladder.Class) []string {
	var list []string
	for i := range a.Recommendation.Rejected {
		x := &a.Recommendation.Rejected[i]
		if x.Class != c {
			continue
		}
		for _, e := range x.Because {
			m := a.Findings[e.Index()].Main()
			dst := append([]byte(e.ID), ": "...)
			dst = append(append(dst, m.Measure.String()...), ' ')
			dst = appendAmount(dst, m.Estimate, isShare(a, m))
			dst = append(dst, " (limit "...)
			list = append(list, string(append(appendAmount(dst, m.Limit, isShare(a, m)), ')')))
		}
	}
	return list
}

func (r *report) conditions(a *regime.Answer) {
	for _, e := range a.Recommendation.Conditions {
		if a.Findings[e.Index()].Verdict == finding.Marginal {
			r.Conditions = append(r.Conditions, string(appendCondition(nil, a, e)))
		}
	}
	for _, w := range waiting(a) {
		r.Conditions = append(r.Conditions, string(appendWaitingInput(nil, &w)))
	}
	r.Conditions = append(r.Conditions, settledSentences(&a.Recommendation)...)
}

func (r *report) findings(a *regime.Answer) {
	ordinary, hazards := judged(a)
	for _, e := range append(hazards, ordinary...) {
		f := &a.Findings[e.Index()]
		r.Findings = append(r.Findings, newFindingRow(a, e, f))
		for _, c := range f.Published() {
			row := criterionRow{Finding: e.ID, Criterion: c.Criterion.Standard, Clause: c.Criterion.Clause, Utilisation: figure(c.Utilisation), Verdict: c.Verdict.String()}
			if c.Criterion.Edition != "" {
				row.Criterion += ", " + c.Criterion.Edition
			}
			if c.Picked {
				row.Picked = "decides"
			}
			r.Criteria = append(r.Criteria, row)
		}
	}
}

func newFindingRow(a *regime.Answer, e *assumption.Entry, f *finding.Finding) findingRow {
	m, share := f.Main(), isShare(a, f.Main())
	row := findingRow{ID: e.ID, Title: e.Title, Verdict: f.Verdict.String(), Mark: verdictSign(f.Verdict), Measure: m.Measure.String(),
		Limit: string(appendAmount(nil, m.Limit, share)), Factor: figure(m.Factor), Because: string(appendBecause(nil, a, f)),
		Hazard: e.Hazard != "", Aside: !f.OfInterest, Waits: m.Waits}
	if m.Source != nil {
		row.Source = sourceSign(m.Source)
	}
	if f.Mode > 0 {
		row.Because = "Mode " + strconv.Itoa(int(f.Mode)) + ": " + row.Because
	}
	if !m.Waits {
		row.Estimate = string(appendAmount(nil, m.Estimate, share))
		row.Utilisation = figure(m.Utilisation)
		row.Margin = string(appendMargin(nil, finding.Margin(m.Utilisation)))
	}
	return row
}

// sourceSign is the short form of a source, with a sign where its content was
// written down from memory; a line below the table explains the sign.
func sourceSign(s *cite.Source) string {
	if s.Memory {
		return s.Short + "°"
	}
	return s.Short
}

// verdictSign has the form that the chart gives a verdict.
func verdictSign(v finding.Verdict) string {
	switch v {
	case finding.Valid:
		return "●"
	case finding.Marginal:
		return "◆"
	case finding.Invalid:
		return "■"
	}
	return "▲"
}

func figure(x float64) string { return string(units.AppendNumber(nil, x, digits)) }

func (r *report) groups(a *regime.Answer) {
	for id := range group.Count {
		d := group.Of(id)
		if !d.Core && !a.Groups.Has(id) {
			continue
		}
		row := groupRow{Symbol: d.Symbol, Title: d.Title, Band: groupBand(a, id)}
		row.Formula, row.Rest = cutFormula(d.Definition)
		if a.Groups.Has(id) {
			row.Value = string(units.AppendNumber(nil, a.Groups.Get(id), 4))
			row.With = groupWith(a, id)
			row.Spread = groupSpread(a, id)
		} else {
			row.Reason = string(appendGroupReason(nil, a, id))
		}
		r.Groups = append(r.Groups, row)
	}
}

// cutFormula parts a definition where the explanation of its symbols begins: at
// the first comma or semicolon that a blank follows. A definition whose division,
// or whose alternative, comes after it stays whole.
func cutFormula(definition string) (formula, rest string) {
	at := strings.IndexFunc(definition, func(r rune) bool { return r == ',' || r == ';' })
	for at >= 0 && at+1 < len(definition) && definition[at+1] != ' ' {
		next := strings.IndexAny(definition[at+1:], ",;")
		if next < 0 {
			return definition, ""
		}
		at += 1 + next
	}
	if at < 0 {
		return definition, ""
	}
	formula, rest = definition[:at], definition[at:]
	if strings.Contains(rest, " / ") {
		return definition, ""
	}
	return formula, rest
}

// groupWith lists the scales that a group is made of: "U = 1.2 m/s, L = 25 mm".
func groupWith(a *regime.Answer, id group.ID) string {
	if a.Groups.State(id) == group.Adopted {
		return "given as a group"
	}
	f := formulaOf[id]
	if f == nil {
		return ""
	}
	var dst []byte
	for i, s := range f.From {
		if !a.Scales.Has(s) {
			continue
		}
		if len(dst) > 0 {
			dst = append(dst, ", "...)
		}
		dst = append(append(dst, withKey(f.From, i)...), " = "...)
		dst = units.AppendFormat(dst, a.Scales.X(s), a.Scales.Value(s).Kind)
	}
	return string(dst)
}

// scales are those that nobody gave: what a reviewer will ask for.
func (r *report) scales(a *regime.Answer) {
	for id := range scale.Count {
		v := a.Scales.Value(id)
		if v.Origin != scale.Assumed && v.Origin != scale.LookedUp {
			continue
		}
		row := scaleRow{Symbol: scale.Of(id).Symbol, Title: scale.Of(id).Title, Value: units.Format(v.X, v.Kind), Origin: v.Origin.String()}
		if v.Note != "" {
			row.Origin += ", " + v.Note
		}
		r.Scales = append(r.Scales, row)
	}
}

// figures are modes, figures for the next step, and frequencies.
func (r *report) figures(a *regime.Answer) {
	for i := range a.Modes {
		m := &a.Modes[i]
		row := modeRow{Number: strconv.Itoa(m.Number), Dry: units.Format(m.FrequencyDry, units.Frequency), Wet: units.Format(m.FrequencyWet, units.Frequency), Class: m.Class.ID}
		if m.Worst != nil {
			row.Worst, row.Utilisation = m.Worst.ID, figure(m.Utilisation)
		}
		r.Modes = append(r.Modes, row)
	}
	for i := range a.Setup {
		f := &a.Setup[i]
		r.Setup = append(r.Setup, setupRow{f.Row.Title, units.Format(f.Value, f.Row.Kind), f.Row.Rule, sourceSign(f.Row.Source), f.Governs})
	}
	wet := a.Scales.X(scale.FrequencyWet)
	for _, f := range frequencies(nil, a) {
		row := frequencyRow{Title: f.title, Value: units.Format(f.value, units.Frequency)}
		if f.id != "wet" && wet > 0 {
			row.Ratio = figure(f.value/wet) + " × wet"
		}
		r.Frequencies = append(r.Frequencies, row)
	}
}

// MarginChart is the chart of the assumptions of an answer, ready to be drawn
// where it stands alone.
func MarginChart(a *regime.Answer) *marginchart.Chart {
	c := barsOf(a)
	c.Title = subjectOf(a)
	c.Moot = mootIDs(a)
	c.Foot = recommendedText(a) + " " + footText(a)
	return c
}

func mootIDs(a *regime.Answer) []string {
	var ids []string
	for i := range a.Findings {
		if a.Findings[i].Main() == nil {
			ids = append(ids, assumption.Catalogue[i].ID)
		}
	}
	return ids
}

// barsOf is the chart without what a page around it says already.
func barsOf(a *regime.Answer) *marginchart.Chart {
	c := &marginchart.Chart{}
	ordinary, hazards := judged(a)
	for _, e := range append(hazards, ordinary...) {
		f := &a.Findings[e.Index()]
		m, share := f.Main(), isShare(a, f.Main())
		if m.Waits {
			c.Waiting = append(c.Waiting, marginchart.Waiting{Name: e.ID, Needs: string(appendMissing(nil, a, f))})
			continue
		}
		amount := append(appendShort(nil, m, share), " / "...)
		c.Bars = append(c.Bars, marginchart.Bar{Name: e.ID, Utilisation: m.Utilisation, Inner: m.Inner, Factor: m.Factor,
			Verdict: f.Verdict, Aside: !f.OfInterest, Figure: string(appendAmount(amount, m.Limit, share))})
	}
	return c
}

// subjectOf is the title of a case, or its kind where it has none.
func subjectOf(a *regime.Answer) string {
	if s, ok := textOf(a, kind.Title); ok && s != "" {
		return s
	}
	return a.Kind.Title
}

func recommendedText(a *regime.Answer) string {
	lead := "Recommended: "
	if a.Recommendation.Provisional {
		lead = "Recommended, provisionally: "
	}
	return lead + string(appendClass(nil, a.Recommendation.Class)) + "."
}

// footText says which case this is, and which engine judged it.
func footText(a *regime.Answer) string {
	s := "regimed " + Version + ", catalogue " + Catalogue()[:12]
	if a.Case != nil {
		s += ", case " + a.Case.Digest()[:12]
	}
	return s + "."
}
