package main

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/ladder"
)

// An expectation is a subject, an operator, and what is wanted:
//
//	class=added-mass|viscous-added-mass     the recommended class
//	axis.coupling=one-way                   an axis of the recommendation
//	one-way=valid|marginal                  the verdict on an assumption
//	one-way.utilisation<0.5                 a number of its finding
//	reynolds>1e4                            a group
//
// Names take = and !=, and alternatives by |. Numbers take ~ (within 2 %), =
// and != (the same but for the noise of arithmetic), <, <=, > and >=; and the
// word null for a number that the answer does not have.
type expectation struct {
	text string
	met  func(a *regime.Answer) (bool, string) // whether it is met, and what there is
}

// question is what an expectation asks of an answer: the class, an axis, an
// assumption or a group.
func (e *expectation) question() string {
	name := e.text
	for _, op := range operators {
		name, _, _ = strings.Cut(name, op)
	}
	name = strings.TrimSpace(name)
	if axis, ok := strings.CutPrefix(name, "axis."); ok {
		return axis
	}
	name, _, _ = strings.Cut(name, ".")
	return name
}

// Tolerances of the comparisons of numbers.
const (
	within = 0.02 // of ~
	noise  = 1e-9 // of = and !=
)

// operators in the order in which they are looked for at one place: the longer
// ones first.
var operators = []string{"!=", "<=", ">=", "=", "<", ">", "~"}

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

// parseExpectation reads one expectation; a name that is not known is an error
// that names the nearest known ones.
func parseExpectation(text string) (expectation, error) {
	subject, operator, want := splitExpectation(text)
	if operator == "" || subject == "" || want == "" {
		return expectation{}, fmt.Errorf("%q is no expectation: want a name, one of %s, and a value, as in class=added-mass", text, strings.Join(operators, " "))
	}
	e := expectation{text: text}
	var err error
	if read, known := nameOf(subject); known {
		e.met, err = nameTest(read, operator, want)
	} else if number, known := numberOf(subject); known {
		e.met, err = numberTest(number, operator, want)
	} else {
		err = fmt.Errorf("nothing in an answer is called %q.%s", subject, didYouMean(subject, subjects()))
	}
	if err != nil {
		return expectation{}, fmt.Errorf("%q: %w", text, err)
	}
	return e, nil
}

// splitExpectation cuts at the first operator.
func splitExpectation(text string) (subject, operator, want string) {
	for i := range text {
		for _, op := range operators {
			if strings.HasPrefix(text[i:], op) {
				return strings.TrimSpace(text[:i]), op, strings.TrimSpace(text[i+len(op):])
			}
		}
	}
	return text, "", ""
}

// nameSubject is a subject whose value is a name.
type nameSubject struct {
	known []string
	of    func(a *regime.Answer) string
}

func nameOf(subject string) (nameSubject, bool) {
	if subject == "class" {
		return nameSubject{classIDs(), func(a *regime.Answer) string { return a.Recommendation.Class.ID }}, true
	}
	if id, ok := strings.CutPrefix(subject, "axis."); ok {
		for _, x := range ladder.AxisList {
			if x.ID == id {
				return nameSubject{x.Values, func(a *regime.Answer) string { return *x.Of(&a.Recommendation.Axes) }}, true
			}
		}
		return nameSubject{}, false
	}
	if entry := assumption.Find(subject); entry != nil {
		return nameSubject{finding.VerdictNames(), func(a *regime.Answer) string { return a.Findings[entry.Index()].Verdict.String() }}, true
	}
	return nameSubject{}, false
}

func nameTest(n nameSubject, operator, want string) (func(*regime.Answer) (bool, string), error) {
	if operator != "=" && operator != "!=" {
		return nil, fmt.Errorf("a name takes = or !=, not %s", operator)
	}
	var alternatives []string
	for word := range strings.SplitSeq(want, "|") {
		word = strings.TrimSpace(word)
		if !slices.Contains(n.known, word) {
			return nil, fmt.Errorf("no such value %q; it is one of %s.%s", word, strings.Join(n.known, ", "), didYouMean(word, n.known))
		}
		alternatives = append(alternatives, word)
	}
	return func(a *regime.Answer) (bool, string) {
		got := n.of(a)
		return slices.Contains(alternatives, got) == (operator == "="), got
	}, nil
}

// numberSubject is a subject whose value is a number: it returns NaN where the answer
// has none, and says why.
type numberSubject func(a *regime.Answer) (x float64, why string)

func numberOf(subject string) (numberSubject, bool) {
	if id, known := group.Find(subject); known {
		return func(a *regime.Answer) (float64, string) { return groupValue(a.Groups, id) }, true
	}
	id, name, _ := strings.Cut(subject, ".")
	entry := assumption.Find(id)
	if entry == nil {
		return nil, false
	}
	for _, n := range findingNumbers {
		if n.name == name {
			return func(a *regime.Answer) (float64, string) { return findingValue(&a.Findings[entry.Index()], n.of) }, true
		}
	}
	return nil, false
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

func numberTest(read numberSubject, operator, want string) (func(*regime.Answer) (bool, string), error) {
	if want == "null" {
		return nullTest(read, operator)
	}
	y, err := strconv.ParseFloat(want, 64)
	if err != nil || math.IsNaN(y) || math.IsInf(y, 0) {
		return nil, fmt.Errorf("%q is no number", want)
	}
	if operator == "~" && y == 0 {
		return nil, fmt.Errorf("nothing but 0 lies within 2 %% of 0; use < or =")
	}
	return func(a *regime.Answer) (bool, string) {
		x, why := read(a)
		if math.IsNaN(x) {
			return false, "null: " + why
		}
		return compare(x, operator, y), strconv.FormatFloat(x, 'g', 6, 64)
	}, nil
}

func nullTest(read numberSubject, operator string) (func(*regime.Answer) (bool, string), error) {
	if operator != "=" && operator != "!=" {
		return nil, fmt.Errorf("null takes = or !=, not %s", operator)
	}
	return func(a *regime.Answer) (bool, string) {
		x, why := read(a)
		if math.IsNaN(x) {
			return operator == "=", "null: " + why
		}
		return operator == "!=", strconv.FormatFloat(x, 'g', 6, 64)
	}, nil
}

func compare(x float64, operator string, y float64) bool {
	near := func(part float64) bool { return math.Abs(x-y) <= part*math.Abs(y) }
	switch operator {
	case "~":
		return near(within)
	case "=":
		return near(noise)
	case "!=":
		return !near(noise)
	case "<":
		return x < y
	case "<=":
		return x <= y
	case ">":
		return x > y
	default:
		return x >= y
	}
}

func classIDs() []string {
	var ids []string
	for i := range ladder.Classes {
		ids = append(ids, ladder.Classes[i].ID)
	}
	return ids
}

// subjects lists everything that an expectation can be about.
func subjects() []string {
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
	return all
}

// expectationWords completes the beginning of an expectation: subjects, and
// after a subject of names its values.
func expectationWords(start string) []string {
	subject, operator, _ := splitExpectation(start)
	if operator == "" {
		return sortedWith(subjects(), start)
	}
	n, known := nameOf(subject)
	if !known {
		return nil
	}
	var words []string
	for _, v := range n.known {
		words = append(words, subject+operator+v)
	}
	return sortedWith(words, start)
}

func sortedWith(words []string, start string) []string {
	words = slices.DeleteFunc(words, func(w string) bool { return !strings.HasPrefix(w, start) })
	slices.SortFunc(words, func(a, b string) int { return cmp.Compare(a, b) })
	return words
}
