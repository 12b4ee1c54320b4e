package canonplot

import (
	"errors"
	"fmt"
	"math"
	"slices"

	"regimed/regime/canon"
)

// curvePoints is the number of points of a curve; few enough for eigenproblems.
const curvePoints = 241

// From where on an axis is logarithmic: two decades for the argument; for values a
// little more, or fewer where the argument is so already. poleRatio is how far above
// nearly all values one may lie.
const (
	argumentRatio = 99
	valueRatio    = 200
	bothRatio     = 30
	poleRatio     = 50
)

// line is y over the abscissae of the picture; NaN where there is nothing.
type line []float64

// curve is one value of the solution.
type curve struct {
	output *canon.Output
	y      line
}

// asymptote is one limit.
type asymptote struct {
	limit *canon.Limit
	y     line
}

// picture is what is drawn, in numbers.
type picture struct {
	entry      *canon.Entry
	args       []float64 // what is not drawn over, and the given or usual value of what is
	over       int       // index of the argument that is drawn over
	given      bool      // a value of that argument is given, and marked
	marked     []float64 // the values there
	x          []float64
	logX, logY bool
	low, high  float64 // ends of the other axis
	curves     []curve
	limits     []asymptote
}

// sample evaluates the solution over its range. NaN in given stands for what
// is not given; given may be shorter than the arguments.
func sample(e *canon.Entry, given []float64) (*picture, error) {
	if len(given) > len(e.Args) {
		return nil, fmt.Errorf("%s takes %d arguments, got %d", e.Name, len(e.Args), len(given))
	}
	p := &picture{entry: e, over: e.Sweep(), args: make([]float64, len(e.Args))}
	for i := range e.Args {
		p.args[i] = e.Args[i].Usual()
		if i < len(given) && !math.IsNaN(given[i]) {
			p.args[i] = given[i]
			p.given = p.given || i == p.over
		}
	}
	if p.given {
		values, err := e.Evaluate(p.args)
		if err != nil {
			return nil, err
		}
		p.marked = values
	}
	from, to := p.window()
	for range 2 { // the second time without the ends at which nothing is answered
		p.abscissae(from, to)
		if err := p.evaluate(); err != nil {
			return nil, err
		}
		answered := p.answered()
		if answered.from == from && answered.to == to {
			break
		}
		from, to = answered.from, answered.to
	}
	p.ordinate()
	p.asymptotes()
	return p, nil
}

// window is that of the argument, which a given value widens.
func (p *picture) window() (from, to float64) {
	from, to = p.entry.Args[p.over].Window()
	if p.given {
		from, to = math.Min(from, p.args[p.over]), math.Max(to, p.args[p.over])
	}
	return from, to
}

// abscissae spreads the points over the window.
func (p *picture) abscissae(from, to float64) {
	p.x = nil
	if p.entry.Args[p.over].Whole {
		for n := from; n <= to && len(p.x) < curvePoints; n++ {
			p.x = append(p.x, n)
		}
		return
	}
	p.logX = from > 0 && to/from > argumentRatio
	for i := range curvePoints {
		f := float64(i) / (curvePoints - 1)
		x := from + (to-from)*f
		if p.logX {
			x = from * math.Pow(to/from, f)
		}
		p.x = append(p.x, math.Min(math.Max(x, from), to))
	}
}

// evaluate fills the curves. Where the arguments do not fit together they have
// gaps; if they fit nowhere, the refusal is the answer.
func (p *picture) evaluate() error {
	p.curves = nil
	for i := range p.entry.Outputs {
		if o := &p.entry.Outputs[i]; o.ID != canon.UncertaintyID {
			p.curves = append(p.curves, curve{output: o})
		}
	}
	var refusal error
	answered := 0
	for _, x := range p.x {
		values, err := p.entry.Evaluate(p.argsAt(x))
		var outside *canon.RangeError
		if err != nil && !errors.As(err, &outside) {
			return err
		}
		if err != nil {
			refusal, values = err, nil
		} else {
			answered++
		}
		p.append(values)
	}
	if answered < 2 {
		return refusal
	}
	return nil
}

// append adds a point to each curve, a gap without values.
func (p *picture) append(values []float64) {
	k := 0
	for i := range p.entry.Outputs {
		if p.entry.Outputs[i].ID == canon.UncertaintyID {
			continue
		}
		y := math.NaN()
		if values != nil && !math.IsInf(values[i], 0) {
			y = values[i]
		}
		p.curves[k].y = append(p.curves[k].y, y)
		k++
	}
}

// span is a part of the abscissa.
type span struct{ from, to float64 }

// answered is the part of the window in which there is an answer; a value that is
// unbounded is one.
func (p *picture) answered() span {
	first, last := len(p.x)-1, 0
	for _, c := range p.curves {
		for i, y := range c.y {
			if !math.IsNaN(y) {
				first, last = min(first, i), max(last, i)
			}
		}
	}
	if slices.ContainsFunc(p.entry.Outputs, func(o canon.Output) bool { return o.Unbounded }) {
		first, last = 0, len(p.x)-1 // what is not drawn there says that there is none
	}
	return span{p.x[first], p.x[last]}
}

// ordinate chooses the scale of the values and its ends.
func (p *picture) ordinate() {
	var values []float64
	for _, c := range p.curves {
		for _, y := range c.y {
			if !math.IsNaN(y) {
				values = append(values, y)
			}
		}
	}
	slices.Sort(values)
	least, most := values[0], values[len(values)-1]
	// A pole would flatten everything else.
	if usual := values[len(values)*97/100]; most > poleRatio*math.Abs(usual) && usual > 0 {
		most = 2 * usual
	}
	if p.logarithmic(values, most) {
		p.logY = true
		lowest := values[slices.IndexFunc(values, func(y float64) bool { return y > 0 })]
		margin := math.Pow(most/lowest, 0.03)
		p.low, p.high = lowest/margin, most*margin
		return
	}
	margin := 0.05 * (most - least)
	if margin == 0 {
		margin = math.Max(0.1*math.Abs(most), 0.1)
	}
	p.low, p.high = least-margin, most+margin
	if least >= 0 && least < 0.4*most { // the axis begins at zero where that costs little
		p.low = 0
	}
}

// logarithmic says that the values, sorted, span decades: many over a linear
// argument, fewer over a logarithmic one. A curve that begins at zero keeps its
// zero, unless the argument leaves it out.
func (p *picture) logarithmic(values []float64, most float64) bool {
	if values[0] < 0 || values[0] == 0 && !p.logX {
		return false
	}
	zeros := slices.IndexFunc(values, func(y float64) bool { return y > 0 })
	if zeros < 0 || zeros > len(values)/20 {
		return false
	}
	ratio := most / values[zeros]
	return ratio > valueRatio || p.logX && ratio > bothRatio
}

// height is where a value lies between the ends of the axis, NaN for none.
func (p *picture) height(y float64) float64 {
	if !p.logY {
		return (y - p.low) / (p.high - p.low)
	}
	if !(y > 0) {
		return math.NaN()
	}
	return math.Log(y/p.low) / math.Log(p.high/p.low)
}

// near is how far from the curve, in heights of the picture, a limit is still
// drawn: farther away it says nothing any more.
const near = 0.08

// asymptotes fills the limits that show: from their end of the range on, as long
// as they are near the curve.
func (p *picture) asymptotes() {
	for i := range p.entry.Limits {
		l := &p.entry.Limits[i]
		c := p.curveOf(l.Output)
		if c == nil {
			continue
		}
		a := asymptote{limit: l, y: make(line, len(p.x))}
		shown, left := 0, false
		for n := range p.x {
			k := n
			if l.End == canon.High {
				k = len(p.x) - 1 - n
			}
			a.y[k] = math.NaN()
			y := l.Value(p.argsAt(p.x[k]))
			h := p.height(y)
			if left || !(math.Abs(h-p.height(c.y[k])) <= near) {
				left = left || shown > 0
				continue
			}
			if h >= 0 && h <= 1 {
				a.y[k] = y
				shown++
			}
		}
		if shown > 1 {
			p.limits = append(p.limits, a)
		}
	}
}

// argsAt are the arguments with another one to draw over.
func (p *picture) argsAt(x float64) []float64 {
	args := append([]float64{}, p.args...)
	args[p.over] = x
	return args
}

func (p *picture) curveOf(id string) *curve {
	for i := range p.curves {
		if p.curves[i].output.ID == id {
			return &p.curves[i]
		}
	}
	return nil
}

// pieces cuts a line at its gaps, and where it leaves a logarithmic axis.
func (p *picture) pieces(y line) [][]int {
	var pieces [][]int
	var piece []int
	for i, v := range y {
		if math.IsNaN(v) || p.logY && !(v > 0) {
			pieces, piece = appendPiece(pieces, piece), nil
			continue
		}
		piece = append(piece, i)
	}
	return appendPiece(pieces, piece)
}

// appendPiece leaves out what is no line.
func appendPiece(pieces [][]int, piece []int) [][]int {
	if len(piece) < 2 {
		return pieces
	}
	return append(pieces, piece)
}
