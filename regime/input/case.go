package input

import (
	"math"
	"slices"

	"regimed/units"
)

// Value is what the caller gave for one field.
type Value struct {
	Field *Field
	Q     units.Quantity    // Quantity; Number and Integer in Q.Value
	Ends  [2]units.Quantity // Interval
	Text  string            // Text, Choice
	List  []string          // Choices
	Flag  bool
	Rows  [][]Value // Rows
}

// Case is what the caller said. It holds only what was given.
type Case struct {
	Kind   string
	Schema *Schema
	given  []Value
}

// NewCase returns an empty case of a kind.
func NewCase(schema *Schema, kind string) *Case {
	return &Case{Kind: kind, Schema: schema, given: make([]Value, 0, 16)}
}

// Given returns what was given, in the order in which it came.
func (c *Case) Given() []Value { return c.given }

// Lookup returns what was given for a field, or nil.
func (c *Case) Lookup(f *Field) *Value {
	for i := range c.given {
		if c.given[i].Field == f {
			return &c.given[i]
		}
	}
	return nil
}

// Has reports whether a field was given.
func (c *Case) Has(f *Field) bool { return c.Lookup(f) != nil }

// X returns the number that was given for a field, in SI; NaN where none was.
func (c *Case) X(f *Field) float64 {
	if v := c.Lookup(f); v != nil {
		return v.Q.Value
	}
	return math.NaN()
}

// Choice returns the name that was given for a field, or another.
func (c *Case) Choice(f *Field, otherwise string) string {
	if v := c.Lookup(f); v != nil {
		return v.Text
	}
	return otherwise
}

// Flag returns what was given for a field, or another.
func (c *Case) Flag(f *Field, otherwise bool) bool {
	if v := c.Lookup(f); v != nil {
		return v.Flag
	}
	return otherwise
}

// HasBlock reports whether any field of a block was given.
func (c *Case) HasBlock(name string) bool {
	return slices.ContainsFunc(c.given, func(v Value) bool { return v.Field.Of == name })
}

// With returns a copy of the case in which a field has another value.
func (c *Case) With(v Value) *Case {
	d := &Case{Kind: c.Kind, Schema: c.Schema, given: slices.Clone(c.given)}
	for i := range d.given {
		if d.given[i].Field == v.Field {
			d.given[i] = v
			return d
		}
	}
	d.given = append(d.given, v)
	return d
}

// Without returns a copy of the case in which a field is not given.
func (c *Case) Without(f *Field) *Case {
	return &Case{Kind: c.Kind, Schema: c.Schema,
		given: slices.DeleteFunc(slices.Clone(c.given), func(v Value) bool { return v.Field == f })}
}

func (c *Case) set(v Value) {
	c.given = append(c.given, v)
}

func topName(f *Field) string {
	if f.Of == "" {
		return f.Name
	}
	return f.Of
}
