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
	Limits   []Limit        // what the outputs approach at the ends of the range
	// Over names the argument over which the entry is drawn; empty: the first
	// that is a continuous number, or else the first that is a number.
	Over string
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
	Whole    bool // a whole number, such as that of a mode
	Optional bool
	Default  float64 // used when Optional and not given; index for Choices
	// Typical is a value in the middle of practice, for pictures: index for
	// Choices. Zero stands for none: see Usual.
	Typical float64
	// From and To are the window that a picture shows; both zero: the range, or
	// its readable part.
	From, To float64
}

// Output is one result.
type Output struct {
	ID, Symbol, Doc string
	Unbounded       bool // +Inf is a result too: it says that there is no such value
}

// UncertaintyID is the id of the output in which a solution that is cut short
// (a set of modes, a series, a rule of integration) says by how much what was left
// out may change the others. A series that is summed until a term changes nothing
// has the accuracy of the entry and no such output.
const UncertaintyID = "uncertainty"

// uncertaintyOutput is that output of the entries whose doc is the usual one.
var uncertaintyOutput = Output{ID: UncertaintyID, Symbol: "δ", Doc: "relative change of the first value that what was left out may make"}

// End is an end of the range of the argument over which an entry is drawn.
type End int

// The two ends.
const (
	Low End = iota
	High
)

// Limit is what an output approaches at one end of the range: an asymptote, or
// the value of a simpler problem.
type Limit struct {
	Name   string // the formula, "thin layer: 1 + 2δ/a"
	Output string // id of the output
	End    End
	// Within is the relative distance that is left at that end of the range, the
	// other arguments at their usual values; a test holds it.
	Within float64
	// Value is the limit as a function of all arguments, in their order; NaN where it
	// means nothing.
	Value func(args []float64) float64
}

// Sweep returns the index of the argument over which the entry is drawn, or −1
// if all of its arguments are choices.
func (e *Entry) Sweep() int {
	if e.Over != "" {
		return slices.IndexFunc(e.Args, func(a Arg) bool { return a.Name == e.Over })
	}
	i := slices.IndexFunc(e.Args, func(a Arg) bool { return len(a.Choices) == 0 && !a.Whole })
	if i < 0 {
		i = slices.IndexFunc(e.Args, func(a Arg) bool { return len(a.Choices) == 0 })
	}
	return i
}

// Usual returns a value in the middle of practice, for an argument that nobody
// gave and over which nothing is drawn.
func (a *Arg) Usual() float64 {
	from, to := a.Window()
	switch {
	case a.Typical != 0 || len(a.Choices) > 0:
		return a.Typical
	case a.Optional:
		return a.Default
	case a.Whole:
		return a.Min
	case from > 0:
		return math.Sqrt(from * to)
	}
	return math.Min(to, 0)
}

// The readable part of a range that spans too many decades for a picture.
const (
	readableFrom    = 1e-3
	readableTo      = 1e4
	readableDecades = 1e7
)

// Window returns the part of the range that a picture shows.
func (a *Arg) Window() (from, to float64) {
	if a.From != 0 || a.To != 0 {
		return a.From, a.To
	}
	from, to = a.Min, a.Max
	if a.Whole {
		return from, math.Min(to, from+19)
	}
	if to > readableTo && (from <= 0 || to/from > readableDecades) {
		to = readableTo
	}
	if from < -readableTo {
		from = -readableTo
	}
	if from >= 0 && from < readableFrom && to >= 100 {
		from = readableFrom
	}
	return from, to
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
			continue
		}
		if err := inRange(e.Name, a.Name, full[i], a.Min, a.Max); err != nil {
			return nil, err
		}
		if a.Whole && full[i] != math.Trunc(full[i]) {
			return nil, &RangeError{Function: e.Name, Arg: a.Name, Value: full[i], Min: a.Min, Max: a.Max, Reason: "want a whole number"}
		}
	}
	return e.Eval(full)
}
