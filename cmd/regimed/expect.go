package main

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"regimed/regime"
	"regimed/regime/whatif"
)

// An expectation is a subject, an operator, and what is wanted:
//
//	class=added-mass|viscous-added-mass     the recommended class
//	axis.coupling=one-way                   an axis of the recommendation
//	one-way=valid|marginal                  the verdict on an assumption
//	one-way.utilisation<0.5                 a number of its finding
//	reynolds>1e4                            a group
//	scale.speed_critical<3                  a scale, in SI
//	setup.time_step_structure~1e-3          a figure for setting up, in SI
//	probability.added-mass>0.9              how probable a class is, where an input is uncertain
//
// Names take = and !=, and alternatives by |. Numbers take ~ (within 2 %), =
// and != (the same but for the noise of arithmetic), <, <=, > and >=; and the
// word null for a number that the answer does not have.
type expectation struct {
	text string
	met  func(a *regime.Answer) (bool, string) // whether it is met, and what there is

	spread bool // it asks how the answer spreads
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

// parseExpectation reads one expectation; a name that is not known is an error
// that names the nearest known ones.
func parseExpectation(text string) (expectation, error) {
	subject, operator, want := splitExpectation(text)
	if operator == "" || subject == "" || want == "" {
		return expectation{}, fmt.Errorf("%q is no expectation: want a name, one of %s, and a value, as in class=added-mass", text, strings.Join(operators, " "))
	}
	e := expectation{text: text}
	column, err := whatif.FindColumn(subject)
	e.spread = column.NeedsSpread()
	switch {
	case err != nil:
	case column.Text != nil:
		e.met, err = nameTest(column, operator, want)
	default:
		e.met, err = numberTest(column.Number, operator, want)
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

func nameTest(n whatif.Column, operator, want string) (func(*regime.Answer) (bool, string), error) {
	if operator != "=" && operator != "!=" {
		return nil, fmt.Errorf("a name takes = or !=, not %s", operator)
	}
	var alternatives []string
	for word := range strings.SplitSeq(want, "|") {
		word = strings.TrimSpace(word)
		if !slices.Contains(n.Known, word) {
			return nil, fmt.Errorf("no such value %q; it is one of %s.%s", word, strings.Join(n.Known, ", "), didYouMean(word, n.Known))
		}
		alternatives = append(alternatives, word)
	}
	return func(a *regime.Answer) (bool, string) {
		got := n.Text(a)
		return slices.Contains(alternatives, got) == (operator == "="), got
	}, nil
}

// numberSubject is the number that an expectation is about: NaN where the answer
// has none, and why.
type numberSubject = func(a *regime.Answer) (x float64, why string)

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

// expectationWords completes the beginning of an expectation: subjects, and
// after a subject of names its values.
func expectationWords(start string) []string {
	subject, operator, _ := splitExpectation(start)
	if operator == "" {
		return sortedWith(whatif.ColumnNames(), start)
	}
	n, err := whatif.FindColumn(subject)
	if err != nil {
		return nil
	}
	var words []string
	for _, v := range n.Known {
		words = append(words, subject+operator+v)
	}
	return sortedWith(words, start)
}

func sortedWith(words []string, start string) []string {
	words = slices.DeleteFunc(words, func(w string) bool { return !strings.HasPrefix(w, start) })
	slices.SortFunc(words, func(a, b string) int { return cmp.Compare(a, b) })
	return words
}
