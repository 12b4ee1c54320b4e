package whatif

import (
	"fmt"
	"slices"
	"strconv"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/input"
)

// NewPlan makes a plan. No columns stand for the class and the utilisation of
// each assumption that decides it somewhere: that rules a cheaper class out, or
// has to be verified. It returns what is wrong with the plan by pointers into a
// request: "/axes/0/input".
func NewPlan(c *input.Case, axes []Axis, columns []Column) (*Plan, []input.Violation) {
	var bad input.Violations
	p := newPlan(c, axes, columns, &bad)
	if bad.Any() {
		return nil, bad.List()
	}
	return p, nil
}

func newPlan(c *input.Case, axes []Axis, columns []Column, bad *input.Violations) *Plan {
	p := &Plan{Case: c, Axes: axes, Columns: columns, Chosen: len(columns) > 0}
	checkAxes(axes, bad)
	checkColumns(columns, bad)
	p.count(bad)
	if !bad.Any() {
		p.probe(bad)
	}
	return p
}

func checkAxes(axes []Axis, bad *input.Violations) {
	if n := len(axes); n == 0 || n > MaxAxes {
		bad.Add("/axes", input.OutOfRange, fmt.Sprintf("A sweep has between 1 and %d axes.", MaxAxes), nil)
	}
	for i := range axes {
		for j := range axes[:i] {
			if axes[i].Place.Field != nil && axes[i].Place == axes[j].Place {
				bad.Add("/axes/"+strconv.Itoa(i)+"/input", input.Duplicate, axes[i].Name()+" is on two axes.", quote(axes[i].Name()))
			}
		}
	}
}

func checkColumns(columns []Column, bad *input.Violations) {
	seen := map[string]bool{}
	for i := range columns {
		name := columns[i].Name
		if seen[name] && name != "" {
			bad.Add("/columns/"+strconv.Itoa(i), input.Duplicate, name+" is asked for twice.", quote(name))
		}
		seen[name] = true
		if columns[i].NeedsSpread() {
			bad.Add("/columns/"+strconv.Itoa(i), input.Contradiction, "A sweep takes uncertain inputs at their middle and has no probabilities.", quote(name))
		}
	}
}

// count multiplies the lengths of the axes, of which none is above MaxPoints.
func (p *Plan) count(bad *input.Violations) {
	p.total = 1
	for i := range p.Axes {
		n := p.Axes[i].Len()
		if n > 0 && p.total > MaxPoints/n {
			bad.Add("/axes", input.OutOfRange, fmt.Sprintf("The axes have more than %d points together.", int64(MaxPoints)), nil)
			return
		}
		p.total *= n
	}
}

// mostProbes is how many points are tried for the units of the columns.
const mostProbes = 64

// probe tries the corners and the middle of the grid, and more points as long as
// the unit of a column is not known. From the answers it takes the units, and
// the columns where none were chosen. A violation that all of them share, and
// that is of no axis, is one of the case itself.
func (p *Plan) probe(bad *input.Violations) {
	var shared []input.Violation
	failed, tried := 0, 0
	deciding := make([]bool, len(assumption.Catalogue))
	varied := p.Case.Clone()
	try := func(index int64) {
		var room [MaxAxes]int64
		a, violations := p.answer(varied, p.point(index, room[:0]))
		tried++
		if len(violations) > 0 {
			shared = common(shared, violations, failed == 0)
			failed++
			return
		}
		p.learn(a)
		markDeciding(deciding, a)
		a.Release()
	}
	p.units = make([]string, len(p.Columns))
	for _, index := range p.corners() {
		try(index)
	}
	for i := int64(1); i < mostProbes && i < p.total && !p.unitsKnown(); i++ {
		try(part(p.total, min(mostProbes, p.total), i))
	}
	if failed == tried {
		p.refuse(shared, bad)
	}
	if !p.Chosen {
		p.Columns = defaultColumns(deciding)
		p.units = make([]string, len(p.Columns))
		for i := range p.Columns {
			p.units[i] = p.Columns[i].staticUnit()
		}
	}
}

// corners returns the points at which each axis is at its first or last value,
// and the middle point.
func (p *Plan) corners() []int64 {
	list := []int64{0}
	middle := int64(0)
	for k := range p.Axes {
		n := p.Axes[k].Len()
		middle = middle*n + n/2
		var longer []int64
		for _, i := range list {
			longer = append(longer, i*n)
			if n > 1 {
				longer = append(longer, i*n+n-1)
			}
		}
		list = longer
	}
	if !slices.Contains(list, middle) {
		list = append(list, middle)
	}
	return list
}

// learn takes the units of the columns that an answer has.
func (p *Plan) learn(a *regime.Answer) {
	for i := range p.Columns {
		c := &p.Columns[i]
		if p.units[i] != "" || c.Text != nil {
			continue
		}
		if c.unit == nil || c.setup {
			p.units[i] = c.Unit(a)
			continue
		}
		if cell := c.cell(a); !cell.Null() {
			p.units[i] = c.Unit(a)
		}
	}
}

func (p *Plan) unitsKnown() bool {
	for i := range p.Columns {
		if p.units[i] == "" && p.Columns[i].Text == nil {
			return false
		}
	}
	return true
}

// staticUnit is the unit of a column that needs no answer for it.
func (c *Column) staticUnit() string {
	if c.Text != nil || c.unit != nil {
		return ""
	}
	return c.Unit(nil)
}

// common returns the violations of a list that another has as well.
func common(shared, list []input.Violation, first bool) []input.Violation {
	if first {
		return list
	}
	return slices.DeleteFunc(slices.Clone(shared), func(v input.Violation) bool {
		return !slices.ContainsFunc(list, func(w input.Violation) bool { return w.Pointer == v.Pointer && w.Code == v.Code })
	})
}

// refuse says what keeps every point from being computed, if it is none of the
// values of an axis.
func (p *Plan) refuse(shared []input.Violation, bad *input.Violations) {
	for _, v := range shared {
		onAxis := slices.ContainsFunc(p.Axes, func(a Axis) bool { return a.Place.Pointer() == v.Pointer })
		if !onAxis {
			bad.Add("/case"+v.Pointer, v.Code, v.Sentence, []byte(v.Value))
		}
	}
}

// markDeciding marks the assumptions that decide an answer.
func markDeciding(deciding []bool, a *regime.Answer) {
	for _, r := range a.Recommendation.Rejected {
		for _, e := range r.Because {
			deciding[e.Index()] = true
		}
	}
	for _, e := range a.Recommendation.Conditions {
		deciding[e.Index()] = true
	}
}

func defaultColumns(deciding []bool) []Column {
	names := []string{"class"}
	for i, e := range assumption.Catalogue {
		if deciding[i] {
			names = append(names, e.ID+".utilisation")
		}
	}
	var list []Column
	for _, name := range names {
		if c, err := FindColumn(name); err == nil { // each is in the catalogue
			list = append(list, c)
		}
	}
	return list
}
