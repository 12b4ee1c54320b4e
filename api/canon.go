package api

import (
	"errors"
	"fmt"
	"math"
	"net/http"
	"net/url"
	"slices"
	"strconv"
	"strings"

	"github.com/labstack/echo/v4"

	"regimed/regime/canon"
	"regimed/regime/input"
)

// CanonResult is a canonical solution evaluated.
type CanonResult struct {
	Name      string         `json:"name"`
	Arguments OrderedMembers `json:"arguments"`
	Values    []CanonValue   `json:"values"`
}

// CanonValue is one result; null where the solution has none at these arguments.
type CanonValue struct {
	ID    string   `json:"id"`
	Value *float64 `json:"value"`
}

// canon evaluates a canonical solution whose arguments stand in the query.
func (s *Server) canon(c echo.Context) error {
	name := c.Param("name")
	e := canon.Find(name)
	if e == nil {
		return problem(notFound, unknownCanon(name))
	}
	values, violations, err := parameters(c, argumentNames(e)...)
	if err != nil {
		return err
	}
	result, more := evaluate(e, values)
	if violations = append(violations, more...); len(violations) > 0 {
		slices.SortStableFunc(violations, func(a, b input.Violation) int { return strings.Compare(a.Pointer, b.Pointer) })
		return violated(invalidQuery, "The query", violations)
	}
	body, err := encode(result)
	if err != nil {
		return err
	}
	return send(c, http.StatusOK, typeJSON, body)
}

func unknownCanon(name string) string {
	var known []string
	for _, e := range canon.All() {
		known = append(known, e.Name)
	}
	if near := input.Nearest(name, known); len(near) > 0 {
		return fmt.Sprintf("No canonical solution has this name. Did you mean %s?", strings.Join(near, " or "))
	}
	return "No canonical solution has this name; /v1/catalog/canon lists them."
}

func argumentNames(e *canon.Entry) []string {
	var names []string
	for i := range e.Args {
		names = append(names, e.Args[i].Name)
	}
	return names
}

// evaluate reads the arguments, checks them, and evaluates the solution.
func evaluate(e *canon.Entry, values url.Values) (*CanonResult, []input.Violation) {
	var bad input.Violations
	args := make([]float64, len(e.Args))
	result := &CanonResult{Name: e.Name}
	for i := range e.Args {
		a := &e.Args[i]
		args[i] = readArgument(a, values, &bad)
		if n := len(a.Choices); n > 0 && args[i] >= 0 && int(args[i]) < n {
			result.Arguments = append(result.Arguments, Member{a.Name, a.Choices[int(args[i])]})
		} else {
			result.Arguments = append(result.Arguments, Member{a.Name, number(args[i])})
		}
	}
	if bad.Any() {
		return nil, bad.List()
	}
	out, err := e.Evaluate(args)
	if err != nil {
		return nil, refused(e, err, values)
	}
	for i, x := range out {
		result.Values = append(result.Values, CanonValue{e.Outputs[i].ID, number(x)})
	}
	return result, nil
}

// readArgument reads one argument: a number within its range, or a choice by
// name, as its index.
func readArgument(a *canon.Arg, values url.Values, bad *input.Violations) float64 {
	pointer := "/" + a.Name
	if !values.Has(a.Name) {
		if !a.Optional {
			bad.Add(pointer, input.MissingField, fmt.Sprintf("%s is needed: %s.", a.Name, a.Doc), nil)
		}
		return a.Default
	}
	text := values.Get(a.Name)
	if len(a.Choices) > 0 {
		i := slices.Index(a.Choices, text)
		if i < 0 {
			bad.Add(pointer, input.UnknownChoice, fmt.Sprintf("%s is one of %s.", a.Name, strings.Join(a.Choices, ", ")), jsonString(text))
		}
		return float64(i)
	}
	x, err := strconv.ParseFloat(text, 64)
	switch {
	case math.IsNaN(x) || math.IsInf(x, 0):
		bad.Add(pointer, input.NotFinite, fmt.Sprintf("%s is no number that can be computed with.", a.Name), jsonString(text))
	case err != nil:
		bad.Add(pointer, input.WrongType, fmt.Sprintf("%s is a pure number, such as 0.5.", a.Name), jsonString(text))
	case x < a.Min || x > a.Max:
		bad.Add(pointer, input.OutOfRange, fmt.Sprintf("%s must lie within %g and %g.", a.Name, a.Min, a.Max), jsonString(text))
	}
	return x
}

// refused turns an error of the solution itself into a violation: arguments
// that are each in range and not so together.
func refused(e *canon.Entry, err error, values url.Values) []input.Violation {
	var bad input.Violations
	var outside *canon.RangeError
	if !errors.As(err, &outside) {
		bad.Add("", input.OutOfRange, fmt.Sprintf("%s has no value at these arguments.", e.Name), nil)
		return bad.List()
	}
	pointer, raw := "", []byte(nil)
	if slices.Contains(argumentNames(e), outside.Arg) {
		pointer = "/" + outside.Arg
		if values.Has(outside.Arg) {
			raw = jsonString(values.Get(outside.Arg))
		}
	}
	bad.Add(pointer, input.OutOfRange, outside.Error()+".", raw)
	return bad.List()
}
