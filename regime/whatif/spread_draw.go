package whatif

import (
	"crypto/sha256"
	"encoding/binary"
	"math"
	"math/rand/v2"
	"slices"
	"strings"

	"gonum.org/v1/gonum/mat"
	"gonum.org/v1/gonum/stat/distmv"
	"gonum.org/v1/gonum/stat/distuv"
	"gonum.org/v1/gonum/stat/samplemv"

	"regimed/regime/input"
	"regimed/units"
)

// Uncertain lists the uncertain inputs of a case, by pointer.
func Uncertain(c *input.Case) []input.Place {
	list := slices.DeleteFunc(c.Places(), func(p input.Place) bool { return c.At(p).Form == units.Certain })
	slices.SortFunc(list, func(p, q input.Place) int { return strings.Compare(p.Pointer(), q.Pointer()) })
	return list
}

// drawing draws the uncertain inputs of a case.
type drawing struct {
	inputs []input.Place
	given  []units.Quantity // by input
	seed   string
}

func newDrawing(c *input.Case) drawing {
	d := drawing{inputs: Uncertain(c)}
	var b strings.Builder
	for _, p := range d.inputs {
		d.given = append(d.given, *c.At(p))
		b.WriteString(p.Pointer() + "\n")
	}
	d.seed = b.String()
	return d
}

// source is where the scrambling of a replicate comes from: the pointers of the
// inputs and the number of the replicate.
func (d *drawing) source(replicate int) rand.Source {
	sum := sha256.Sum256(binary.BigEndian.AppendUint32([]byte(d.seed), uint32(replicate)))
	return rand.NewPCG(binary.BigEndian.Uint64(sum[:8]), binary.BigEndian.Uint64(sum[8:16]))
}

// points returns the first n points of a replicate, in the unit cube with an edge
// an input. A longer replicate begins with the points of a shorter one.
func (d *drawing) points(replicate, n int) [][]float64 {
	cube := distmv.NewUnitUniform(len(d.inputs), nil)
	made := mat.NewDense(n, len(d.inputs), nil)
	samplemv.Halton{Kind: samplemv.Owen, Q: cube, Src: d.source(replicate)}.Sample(made)
	rows := make([][]float64, n)
	for i := range rows {
		rows[i] = made.RawRowView(i)
	}
	return rows
}

// valueAt is the value of a quantity below which a share u of its distribution lies.
func valueAt(q units.Quantity, u float64) float64 {
	const least, most = 0x1p-54, 1 - 0x1p-53 // a sum of digits may round to 1, and 0 would be −∞
	u = min(max(u, least), most)
	if q.Form == units.Uniform {
		return q.Value + q.Spread*(2*u-1)
	}
	return q.Value + q.Spread*distuv.UnitNormal.Quantile(u)
}

// put sets a draw in a case. It returns the number of the first input that
// refuses its value, or −1. Both ends of an interval are set before either of them
// is asked, since they may only be in order together.
func (d *drawing) put(c *input.Case, point []float64) (refused int) {
	for i, p := range d.inputs {
		if p.Field.Type == input.Interval {
			c.Set(p, valueAt(d.given[i], point[i]))
		}
	}
	for i, p := range d.inputs {
		x := valueAt(d.given[i], point[i])
		if math.IsInf(x, 0) || !c.Set(p, x) {
			return i
		}
	}
	return -1
}

// blamed is the number of the input that violations are about, or −1.
func (d *drawing) blamed(violations []input.Violation) int {
	for i := range d.inputs {
		pointer := d.inputs[i].Pointer()
		if slices.ContainsFunc(violations, func(v input.Violation) bool { return v.Pointer == pointer }) {
			return i
		}
	}
	return -1
}
