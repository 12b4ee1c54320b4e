package input

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"regimed/units"
)

// Place is where one scalar of a case stands: a field, one end of an interval,
// or a field of one object of a list.
type Place struct {
	Field *Field
	List  *Field // the list (Rows) that the object belongs to; nil: none
	Row   int    // number of the object in the list, from 0
	End   int    // of an Interval: 0 its lowest, 1 its highest value
}

// Pointer is the JSON Pointer of the place (RFC 6901).
func (p Place) Pointer() string {
	switch {
	case p.List != nil:
		return p.List.Pointer() + "/" + strconv.Itoa(p.Row) + "/" + p.Field.Name
	case p.Field.Type == Interval:
		return p.Field.Pointer() + "/" + strconv.Itoa(p.End)
	}
	return p.Field.Pointer()
}

// Path is the dotted path of the place: "structure.modes.0.frequency_dry".
func (p Place) Path() string {
	return strings.ReplaceAll(strings.TrimPrefix(p.Pointer(), "/"), "/", ".")
}

// Kind is the kind of quantity that stands there.
func (p Place) Kind() units.Kind {
	if p.Field.Type == Quantity || p.Field.Type == Interval {
		return p.Field.Kind
	}
	return units.Dimensionless
}

// scalar reports whether a field holds one number.
func (f *Field) scalar() bool {
	return f.Type == Quantity || f.Type == Number || f.Type == Integer
}

// Places lists the scalars that were given, in the order in which they came.
func (c *Case) Places() []Place {
	var list []Place
	for i := range c.given {
		v := &c.given[i]
		switch {
		case v.Field.scalar():
			list = append(list, Place{Field: v.Field})
		case v.Field.Type == Interval:
			list = append(list, Place{Field: v.Field, End: 0}, Place{Field: v.Field, End: 1})
		case v.Field.Type == Rows:
			for row := range v.Rows {
				for _, w := range v.Rows[row] {
					if w.Field.scalar() {
						list = append(list, Place{Field: w.Field, List: v.Field, Row: row})
					}
				}
			}
		}
	}
	return list
}

// At returns the quantity that was given at a place, or nil. It stays part of
// the case.
func (c *Case) At(p Place) *units.Quantity {
	if p.List != nil {
		list := c.Lookup(p.List)
		if list == nil || p.Row >= len(list.Rows) {
			return nil
		}
		row := list.Rows[p.Row]
		for i := range row {
			if row[i].Field == p.Field {
				return &row[i].Q
			}
		}
		return nil
	}
	v := c.Lookup(p.Field)
	switch {
	case v == nil:
		return nil
	case p.Field.Type == Interval:
		return &v.Ends[p.End]
	}
	return &v.Q
}

// Clone returns a copy that shares nothing that Set writes to.
func (c *Case) Clone() *Case {
	d := &Case{Kind: c.Kind, Schema: c.Schema, given: slices.Clone(c.given)}
	for i := range d.given {
		rows := slices.Clone(d.given[i].Rows)
		for r := range rows {
			rows[r] = slices.Clone(rows[r])
		}
		d.given[i].Rows = rows
	}
	return d
}

// Set puts a certain number, in SI, at a place. A place that was not given is
// filled. It returns false where the number breaks the rule of the field, the
// order of an interval or the wholeness of an integer; the case is then not fit
// to be resolved until the place is set again.
func (c *Case) Set(p Place, x float64) bool {
	q := c.At(p)
	if q == nil {
		if p.List != nil || p.Field.Type == Interval {
			return false
		}
		c.given = append(c.given, Value{Field: p.Field})
		q = &c.given[len(c.given)-1].Q
	}
	q.Value, q.Form, q.Spread = x, units.Certain, 0
	if p.Field.Type == Interval {
		v := c.Lookup(p.Field)
		if v.Ends[0].Value > v.Ends[1].Value {
			return false
		}
	}
	return p.Field.Allows(x)
}

// Put is Set for a value that was read by ParseValue, names included.
func (c *Case) Put(p Place, v Value) bool {
	if p.Field.Type != Choice {
		return c.Set(p, v.Q.Value)
	}
	if old := c.Lookup(p.Field); old != nil {
		*old = v
	} else {
		c.given = append(c.given, v)
	}
	return true
}

// Allows reports whether a number keeps the rule of a field.
func (f *Field) Allows(x float64) bool {
	if f.Type == Integer && x != float64(int64(x)) {
		return false
	}
	return f.Rule == "" || rules.Var(x, f.Rule) == nil
}

// FindPlace returns the place of a name in a case: "flow.speed", its JSON
// Pointer "/flow/speed", "flow.operating.1" for an end of an interval, or
// "structure.modes.0.frequency_dry" for a field of an object in a list. It need
// not be given in the case, but for ends and objects. Names of choices are
// places too. An error names the nearest places.
func (c *Case) FindPlace(name string) (Place, error) {
	parts := strings.Split(strings.ReplaceAll(strings.TrimPrefix(name, "/"), "/", "."), ".")
	f := c.field(parts)
	if f == nil {
		return Place{}, fmt.Errorf("%s", unknown("input", name, c.PlaceNames()))
	}
	rest := parts[min(len(parts), strings.Count(f.Path(), ".")+1):]
	switch {
	case (f.scalar() || f.Type == Choice) && len(rest) == 0:
		return Place{Field: f}, nil
	case f.Type == Interval && len(rest) == 1 && (rest[0] == "0" || rest[0] == "1"):
		p := Place{Field: f, End: int(rest[0][0] - '0')}
		if c.At(p) == nil {
			return Place{}, fmt.Errorf("%s is not given in this case", f.Path())
		}
		return p, nil
	case f.Type == Rows && len(rest) == 2:
		row, err := strconv.Atoi(rest[0])
		p := Place{Field: f.Row.Find(rest[1]), List: f, Row: row}
		if err == nil && row >= 0 && p.Field != nil && c.At(p) != nil {
			return p, nil
		}
		return Place{}, fmt.Errorf("%s is not given in this case", strings.Join(parts, "."))
	}
	return Place{}, fmt.Errorf("%s is no single number", name)
}

// field returns the field at the beginning of a path, or nil.
func (c *Case) field(parts []string) *Field {
	if len(parts) < 2 {
		return nil
	}
	b := c.Schema.Block(parts[0])
	if parts[0] == "structure" {
		b = c.Schema.Kind(c.Kind)
	}
	if b == nil {
		return nil
	}
	return b.Find(parts[1])
}

// PlaceNames lists the paths of all fields that may be varied.
func (c *Case) PlaceNames() []string {
	var list []string
	for _, b := range append([]*Block{c.Schema.Kind(c.Kind)}, c.Schema.Blocks...) {
		for _, f := range b.Fields {
			if f.scalar() || f.Type == Choice {
				list = append(list, f.Path())
			}
		}
	}
	return list
}

// ParseValue reads a value for a place as it would stand in a case, in JSON:
// "1.2 m/s", 0.02, {"value": …}, or a name. pointer locates violations.
func (c *Case) ParseValue(p Place, pointer string, raw []byte) (Value, []Violation) {
	d := &decoder{schema: c.Schema}
	v := Value{Field: p.Field}
	ok := true
	switch p.Field.Type {
	case Choice:
		v.Text, ok = d.choice(p.Field, pointer, raw)
	case Integer:
		v.Q, ok = d.integer(p.Field, pointer, raw)
	default:
		v.Q, ok = d.quantity(p.Field, p.Kind(), pointer, raw)
	}
	if ok && p.Field.Type != Choice {
		d.rule(p.Field, v.Q.Value, pointer, raw)
	}
	return v, d.bad.List()
}
