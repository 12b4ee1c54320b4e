package whatif

import (
	"fmt"
	"math"
	"strings"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/ladder"
	"regimed/regime/scale"
	"regimed/regime/setup"
	"regimed/units"
)

// Column is one thing that can be asked of an answer by name:
//
//	class                     the recommended class
//	axis.coupling             an axis of the recommendation
//	one-way                   the verdict on an assumption
//	one-way.utilisation       a number of its finding: utilisation, estimate,
//	                          margin, limit or factor
//	reynolds                  a group
//	scale.speed_critical      a scale, in SI
//	setup.time_step_structure a figure for setting up, in SI
//	probability.added-mass    how probable it is that a class is recommended,
//	                          where an input is uncertain
//
// Exactly one of Text and Number is set.
type Column struct {
	Name  string
	Known []string // the values that a text can have
	Text  func(a *regime.Answer) string
	// Number returns NaN where the answer has none, and says why.
	Number func(a *regime.Answer) (x float64, why string)
	unit   func(a *regime.Answer) units.Kind
	setup  bool
	spread bool
}

// NeedsSpread reports whether the column is read from the spread of an answer.
func (c *Column) NeedsSpread() bool { return c.spread }

// findingNumbers are the numbers of a finding that can be asked for.
var findingNumbers = []struct {
	name string
	of   func(p *finding.Part) float64
}{
	{"utilisation", func(p *finding.Part) float64 { return p.Utilisation }},
	{"estimate", func(p *finding.Part) float64 { return p.Estimate }},
	{"margin", func(p *finding.Part) float64 { return finding.Margin(p.Utilisation) }},
	{"limit", func(p *finding.Part) float64 { return p.Limit }},
	{"factor", func(p *finding.Part) float64 { return p.Factor }},
}

// Unit is the SI unit of a number, as an answer of the same kind of structure
// has it; "" for a text.
func (c *Column) Unit(a *regime.Answer) string {
	switch {
	case c.Text != nil:
		return ""
	case c.unit == nil:
		return units.Dimensionless.SI()
	}
	return c.unit(a).SI()
}

// UnknownColumnError says that nothing in an answer has a name.
type UnknownColumnError struct {
	Name string
	Near []string
}

func (e *UnknownColumnError) Error() string {
	text := fmt.Sprintf("nothing in an answer is called %q.", e.Name)
	if len(e.Near) > 0 {
		text += " Did you mean " + input.OrList(e.Near) + "?"
	}
	return text
}

// FindColumn returns the column of that name, or an [UnknownColumnError].
func FindColumn(name string) (Column, error) {
	c, known := columnOf(name)
	if !known {
		return Column{}, &UnknownColumnError{Name: name, Near: nearColumns(name)}
	}
	c.Name = name
	return c, nil
}

// nearColumns lists the names that may have been meant. Of an assumption whose
// number has no such name these are its verdict and its first number.
func nearColumns(name string) []string {
	near := input.Nearest(name, ColumnNames())
	if head, _, dotted := strings.Cut(name, "."); len(near) == 0 && dotted && assumption.Find(head) != nil {
		near = []string{head, head + "." + findingNumbers[0].name}
	}
	return near
}

func columnOf(name string) (Column, bool) {
	if name == "class" {
		return Column{Known: classIDs(), Text: func(a *regime.Answer) string { return a.Recommendation.Class.ID }}, true
	}
	head, tail, _ := strings.Cut(name, ".")
	switch head {
	case "axis":
		return axisColumn(tail)
	case "scale":
		return scaleColumn(tail)
	case "setup":
		return setupColumn(tail)
	case "probability":
		return probabilityColumn(tail)
	}
	if id, known := group.Find(name); known {
		return Column{Number: func(a *regime.Answer) (float64, string) { return groupValue(a.Groups, id) }}, true
	}
	return findingColumn(head, tail)
}

func axisColumn(id string) (Column, bool) {
	for _, x := range ladder.AxisList {
		if x.ID == id {
			return Column{Known: x.Values, Text: func(a *regime.Answer) string { return *x.Of(&a.Recommendation.Axes) }}, true
		}
	}
	return Column{}, false
}

func findingColumn(id, number string) (Column, bool) {
	entry := assumption.Find(id)
	if entry == nil {
		return Column{}, false
	}
	at := entry.Index()
	if number == "" {
		return Column{Known: finding.VerdictNames(), Text: func(a *regime.Answer) string { return a.Findings[at].Verdict.String() }}, true
	}
	for _, n := range findingNumbers {
		if n.name == number {
			return Column{Number: func(a *regime.Answer) (float64, string) { return findingValue(&a.Findings[at], n.of) }}, true
		}
	}
	return Column{}, false
}

func scaleColumn(name string) (Column, bool) {
	for id := range scale.Count {
		if scale.Of(id).ID == name {
			return Column{unit: func(a *regime.Answer) units.Kind { return a.Scales.Value(id).Kind },
				Number: func(a *regime.Answer) (float64, string) { return scaleValue(a.Scales, id) }}, true
		}
	}
	return Column{}, false
}

func setupColumn(name string) (Column, bool) {
	for i := range setup.Rows {
		row := &setup.Rows[i]
		if row.ID == name {
			return Column{unit: func(*regime.Answer) units.Kind { return row.Kind }, setup: true,
				Number: func(a *regime.Answer) (float64, string) { return setupValue(a, row) }}, true
		}
	}
	return Column{}, false
}

func probabilityColumn(id string) (Column, bool) {
	for i := range ladder.Classes {
		if c := &ladder.Classes[i]; c.ID == id {
			return Column{spread: true, Number: func(a *regime.Answer) (float64, string) { return probabilityValue(a.Spread, c) }}, true
		}
	}
	return Column{}, false
}

func groupValue(g *group.Set, id group.ID) (float64, string) {
	switch {
	case g.Has(id):
		return g.Get(id), ""
	case g.State(id) == group.Missing:
		return math.NaN(), "it needs " + g.Need(id).Input
	case g.State(id) == group.OffRange:
		return math.NaN(), "it is outside the range of its formula"
	default:
		return math.NaN(), "it does not arise"
	}
}

func findingValue(f *finding.Finding, of func(*finding.Part) float64) (float64, string) {
	p := f.Main()
	if p == nil || p.Waits {
		return math.NaN(), "the verdict is " + f.Verdict.String()
	}
	return of(p), ""
}

func scaleValue(s *scale.Set, id scale.ID) (float64, string) {
	if s.Has(id) {
		return s.X(id), ""
	}
	if need := s.Needs(id); need != "" {
		return math.NaN(), "it needs " + need
	}
	return math.NaN(), "it does not arise"
}

func setupValue(a *regime.Answer, row *setup.Row) (float64, string) {
	for i := range a.Setup {
		if a.Setup[i].Row == row {
			return a.Setup[i].Value, ""
		}
	}
	return math.NaN(), "the recommended class does not need it, or its scales are not known"
}

func probabilityValue(s *regime.Spread, c *ladder.Class) (float64, string) {
	switch {
	case s == nil:
		return math.NaN(), "no input of the case is uncertain"
	case s.Samples == 0:
		return math.NaN(), "every draw lay outside what the case allows"
	}
	for i := range s.Classes {
		if s.Classes[i].Class == c {
			return s.Classes[i].Share, ""
		}
	}
	return 0, ""
}

func classIDs() []string {
	var ids []string
	for i := range ladder.Classes {
		ids = append(ids, ladder.Classes[i].ID)
	}
	return ids
}

// ColumnNames lists the names of all columns.
func ColumnNames() []string {
	all := []string{"class"}
	for _, x := range ladder.AxisList {
		all = append(all, "axis."+x.ID)
	}
	for _, e := range assumption.Catalogue {
		all = append(all, e.ID)
	}
	for id := range group.Count {
		all = append(all, group.Of(id).ID)
	}
	for _, e := range assumption.Catalogue {
		for _, n := range findingNumbers {
			all = append(all, e.ID+"."+n.name)
		}
	}
	for id := range scale.Count {
		all = append(all, "scale."+scale.Of(id).ID)
	}
	for i := range setup.Rows {
		all = append(all, "setup."+setup.Rows[i].ID)
	}
	for _, id := range classIDs() {
		all = append(all, "probability."+id)
	}
	return all
}
