package whatif

import (
	"context"
	"fmt"
	"math"
	"math/bits"
	"runtime"
	"strings"
	"sync"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/setup"
	"regimed/units"
)

// Plan is a sweep: a case, the inputs that are varied in it, and what is asked
// of each answer. The points are all combinations of the values of the axes; the
// last axis varies fastest. A plan is not written to once it is made, so that
// parts of it may run at the same moment.
type Plan struct {
	Case    *input.Case
	Axes    []Axis
	Columns []Column
	Chosen  bool // the columns were chosen by the caller, and not by default

	total int64
	units []string // of the columns; "" of a text, or where no answer has it
}

// MaxAxes is the most axes that a sweep may have.
const MaxAxes = 4

// Total is the number of points.
func (p *Plan) Total() int64 { return p.total }

// Unit is the SI unit of a column; "" where it is a text, or where no answer that
// was tried has it.
func (p *Plan) Unit(column int) string { return p.units[column] }

// Uncertain lists the inputs of the case that are uncertain and on no axis. A
// sweep takes each at its middle.
func (p *Plan) Uncertain() []string {
	var list []string
	for _, place := range p.Case.Places() {
		if q := p.Case.At(place); q.Form != units.Certain && p.axisOf(place) < 0 {
			list = append(list, place.Path())
		}
	}
	return list
}

// axisOf returns the axis that varies a place, -1 if none does.
func (p *Plan) axisOf(place input.Place) int {
	for i := range p.Axes {
		if p.Axes[i].Place == place {
			return i
		}
	}
	return -1
}

// Shard returns the rows from, inclusive, to, exclusive, of one of n equal parts
// of the sweep. The parts are contiguous: in order, they are the whole.
func (p *Plan) Shard(n, index int64) (from, to int64) {
	return part(p.total, n, index), part(p.total, n, index+1)
}

// part is ⌊total·i/n⌋ for 0 ≤ i ≤ n.
func part(total, n, i int64) int64 {
	high, low := bits.Mul64(uint64(total), uint64(i))
	q, _ := bits.Div64(high, low, uint64(n))
	return int64(q)
}

// Row is one point with its answer.
type Row struct {
	Index   int64
	Axes    []Cell // the values of the axes
	Cells   []Cell // the columns
	Problem string // why the point can't be computed; "" where it can
}

// Cell is one value: a text, or a number in SI. It is null where the text is
// empty and the number NaN.
type Cell struct {
	Text   string
	Number float64
}

// Null reports whether a cell has no value. What is not finite has none either.
func (c *Cell) Null() bool {
	return c.Text == "" && (math.IsNaN(c.Number) || math.IsInf(c.Number, 0))
}

// chunkSize is the number of points that are judged in one go: enough that
// handing them on costs nothing beside, few enough that a chunk of the slowest
// kind takes less than half a second.
const chunkSize = 64

// Run judges the points from, inclusive, to, exclusive, on all processors, and
// hands them on in order, some at a time. The rows belong to emit only until it
// returns. The memory that is used does not depend on the number of points.
//
// A point that can't be computed is a row with a problem. Run ends at the first
// error of emit, or with the context, whose cause it then returns.
func (p *Plan) Run(ctx context.Context, from, to int64, emit func([]Row) error) error {
	from, to = max(from, 0), min(to, p.total)
	at := from
	next := func() (int64, bool, error) {
		start := at
		at = min(at+chunkSize, to)
		return start, start < to, nil
	}
	work := func(start int64) *chunk {
		c := p.newChunk()
		p.fill(c, start, min(start+chunkSize, to))
		return c
	}
	return InOrder(ctx, runtime.GOMAXPROCS(0), next, work, func(c *chunk) error {
		if ctx.Err() != nil {
			return context.Cause(ctx)
		}
		err := emit(c.rows)
		chunks.Put(c)
		return err
	})
}

// chunk is the room for the rows of one go.
type chunk struct {
	rows  []Row
	cells []Cell
}

var chunks = sync.Pool{New: func() any { return new(chunk) }}

func (p *Plan) newChunk() *chunk {
	c := chunks.Get().(*chunk)
	if need := chunkSize * (len(p.Axes) + len(p.Columns)); len(c.cells) < need {
		c.cells = make([]Cell, need)
	}
	return c
}

// fill judges the points of a chunk, each in the same copy of the case.
func (p *Plan) fill(c *chunk, from, to int64) {
	c.rows = c.rows[:0]
	varied := p.Case.Clone()
	room := c.cells
	for i := from; i < to; i++ {
		n := len(p.Axes)
		m := n + len(p.Columns)
		row := Row{Index: i, Axes: room[:n:n], Cells: room[n:m:m]}
		room = room[m:]
		p.guard(varied, &row)
		c.rows = append(c.rows, row)
	}
}

// guard judges a point. One at which the engine itself fails is a row with a
// problem as well: it must not take the others, or a whole server, with it.
func (p *Plan) guard(varied *input.Case, row *Row) {
	defer func() {
		if cause := recover(); cause != nil {
			row.fail(fmt.Sprintf("the engine has a fault here: %v", cause))
		}
	}()
	p.judge(varied, row)
}

// fail leaves a row without values.
func (r *Row) fail(problem string) {
	r.Problem = strings.Join(strings.Fields(problem), " ")
	for k := range r.Cells {
		r.Cells[k] = Cell{Number: math.NaN()}
	}
}

// Point fills in the values of the axes at a point, and judges nothing.
func (p *Plan) Point(index int64, row *Row) {
	var room [MaxAxes]int64
	row.Index = index
	row.Axes = row.Axes[:0]
	for k, i := range p.point(index, room[:0]) {
		row.Axes = append(row.Axes, p.Axes[k].cell(i))
	}
}

// judge fills one row.
func (p *Plan) judge(varied *input.Case, row *Row) {
	var room [MaxAxes]int64
	at := p.point(row.Index, room[:0])
	p.Point(row.Index, row)
	a, violations := p.answer(varied, at)
	if len(violations) > 0 {
		row.fail(problemOf(violations))
		return
	}
	for k := range p.Columns {
		row.Cells[k] = p.Columns[k].cell(a)
	}
	a.Release()
}

// point returns the numbers of the values of the axes at a point, in the room
// that dst has.
func (p *Plan) point(index int64, dst []int64) []int64 {
	dst = dst[:len(p.Axes)]
	for k := len(p.Axes) - 1; k >= 0; k-- {
		n := p.Axes[k].Len()
		dst[k] = index % n
		index /= n
	}
	return dst
}

// answer judges the case with the axes at a point.
func (p *Plan) answer(varied *input.Case, at []int64) (*regime.Answer, []input.Violation) {
	if bad := p.put(varied, at); len(bad) > 0 {
		return nil, bad
	}
	a, violations := regime.Judge(varied)
	if len(violations) == 0 && p.needsSetup() {
		a.Setup = setup.Figures(a.Scales, a.Groups, &a.Recommendation)
	}
	return a, violations
}

func (p *Plan) needsSetup() bool {
	for i := range p.Columns {
		if p.Columns[i].setup {
			return true
		}
	}
	return false
}

// put sets the axes at a point. What is refused is asked again when all are set:
// the two ends of an interval are in order only together.
func (p *Plan) put(varied *input.Case, at []int64) []input.Violation {
	ok := true
	for k := range p.Axes {
		ok = p.Axes[k].Put(varied, at[k]) && ok
	}
	if ok {
		return nil
	}
	var bad []input.Violation
	for k := range p.Axes {
		if !p.Axes[k].Put(varied, at[k]) {
			bad = append(bad, p.Axes[k].refused(at[k]))
		}
	}
	return bad
}

// refused says why the case does not admit a value.
func (a *Axis) refused(i int64) input.Violation {
	f := a.Place.Field
	v := input.Violation{Pointer: a.Place.Pointer(), Code: input.OutOfRange}
	if f.Type == input.Interval && f.Allows(a.X(i)) {
		v.Code, v.Sentence = input.Contradiction, f.Path()+": the lowest value is above the highest."
		return v
	}
	v.Sentence = fmt.Sprintf("%s must be %s.", a.Name(), input.RuleText(f))
	return v
}

func (a *Axis) cell(i int64) Cell {
	if a.Named() {
		return Cell{Text: a.Text(i), Number: math.NaN()}
	}
	return Cell{Number: a.X(i)}
}

func (c *Column) cell(a *regime.Answer) Cell {
	if c.Text != nil {
		return Cell{Text: c.Text(a), Number: math.NaN()}
	}
	x, _ := c.Number(a)
	return Cell{Number: x}
}

// problemOf says what keeps a point from being computed.
func problemOf(violations []input.Violation) string {
	parts := make([]string, len(violations))
	for i, v := range violations {
		parts[i] = v.Pointer + ": " + v.Sentence
	}
	return strings.Join(parts, " ")
}
