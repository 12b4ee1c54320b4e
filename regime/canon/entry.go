// Package canon holds the canonical solutions: solved problems that price a
// simplification. Pure functions of dimensionless numbers: no case, no unit.
//
// Complex factors are written Γ = Γr − iΓi for a motion e^{+iωt}: Γr multiplies
// the ideal added mass, Γi makes damping; both are ≥ 0 in still fluid. A source
// that writes e^{−iωt} is conjugated first.
//
// Every function is also an Entry, which names its arguments, their ranges,
// its results, its accuracy and its sources, so that the command line, the
// HTTP interface, the documentation and the generic tests follow from it.
package canon

import (
	"errors"
	"fmt"
	"math"
	"slices"
	"strings"

	"regimed/regime/cite"
)

// Entry describes one canonical solution as data.
type Entry struct {
	Name     string         // exported name of the function: "OscillatingCylinder"
	Problem  string         // the problem in one line
	Equation string         // the formula, in plain text
	Args     []Arg          // in positional order
	Outputs  []Output       // in the order in which Eval returns them
	Accuracy float64        // relative accuracy over the stated range
	Factor   float64        // model-form factor φ ≥ 1 when used for this very geometry
	Sources  []*cite.Source // at least one
	Note     string         // limits, traps, what it does not cover; may be empty
	// Eval evaluates the entry. It may rely on the arguments having been
	// checked by Evaluate against their ranges; it returns a RangeError for
	// conditions that tie arguments together.
	Eval func(args []float64) ([]float64, error)
}

// Arg is one argument: a dimensionless number, or a choice by name.
type Arg struct {
	Name     string
	Symbol   string
	Doc      string
	Min, Max float64 // inclusive; not used with Choices
	Choices  []string
	Optional bool
	Default  float64 // used when Optional and not given; index for Choices
}

// Output is one result.
type Output struct {
	ID, Symbol, Doc string
}

// RangeError says that an argument lies outside the range in which a canonical
// solution holds.
type RangeError struct {
	Function, Arg string
	Value         float64
	Min, Max      float64
	Reason        string // optional, replaces the plain range
}

func (e *RangeError) Error() string {
	if e.Reason != "" {
		return fmt.Sprintf("%s: %s = %g: %s", e.Function, e.Arg, e.Value, e.Reason)
	}
	return fmt.Sprintf("%s: %s = %g is outside %g to %g", e.Function, e.Arg, e.Value, e.Min, e.Max)
}

// inRange returns nil when min ≤ x ≤ max, and a RangeError otherwise (NaN included).
func inRange(function, arg string, x, min, max float64) error {
	if x >= min && x <= max {
		return nil
	}
	return &RangeError{Function: function, Arg: arg, Value: x, Min: min, Max: max}
}

// ErrUnknown says that no canonical solution or argument has the name given.
var ErrUnknown = errors.New("canon: unknown name")

// All lists the canonical solutions, in the order of the subject.
func All() []*Entry {
	return slices.Concat(stillFluidEntries, structureEntries, flowEntries)
}

// Find returns the entry of that name (case-insensitive), or nil.
func Find(name string) *Entry {
	for _, e := range All() {
		if strings.EqualFold(e.Name, name) {
			return e
		}
	}
	return nil
}

// Evaluate checks the arguments against their ranges and evaluates the entry.
// It takes at most len(Args) values; missing ones must be optional.
func (e *Entry) Evaluate(args []float64) ([]float64, error) {
	if len(args) > len(e.Args) {
		return nil, fmt.Errorf("%s takes %d arguments, got %d", e.Name, len(e.Args), len(args))
	}
	full := make([]float64, len(e.Args))
	for i, a := range e.Args {
		switch {
		case i < len(args) && !(a.Optional && math.IsNaN(args[i])):
			full[i] = args[i]
		case a.Optional:
			full[i] = a.Default
		default:
			return nil, fmt.Errorf("%s: argument %s is missing", e.Name, a.Name)
		}
		if n := len(a.Choices); n > 0 {
			if full[i] != math.Trunc(full[i]) || full[i] < 0 || full[i] >= float64(n) {
				return nil, &RangeError{Function: e.Name, Arg: a.Name, Value: full[i], Reason: "want one of " + strings.Join(a.Choices, ", ")}
			}
		} else if err := inRange(e.Name, a.Name, full[i], a.Min, a.Max); err != nil {
			return nil, err
		}
	}
	return e.Eval(full)
}
