package mapplot

import (
	"math"
	"math/bits"
	"slices"

	"gonum.org/v1/plot/vg"

	"regimed/regime/whatif"
)

// grain is the size of a point of the raster by which room for words is found.
const grain = 0.5 * vg.Millimeter

// raster is the plot in points as large as grain: which region each belongs to,
// and what stands there already.
type raster struct {
	cols, rows int
	region     []int    // index of the region
	taken      []int    // 1 where a word or a mark stands
	lined      []uint64 // the lines that run there, a bit each
	clear      []int    // distance to the next region or the frame, in points
}

func newRaster(m *whatif.Map, width, height vg.Length) *raster {
	r := &raster{cols: int(width / grain), rows: int(height / grain)}
	n := r.cols * r.rows
	r.region, r.taken, r.lined, r.clear = make([]int, n), make([]int, n), make([]uint64, n), make([]int, n)
	for i := range m.Regions {
		r.fill(i, m.Regions[i].Rings)
	}
	r.measure()
	return r
}

// fill marks the points of a region, row by row.
func (r *raster) fill(region int, rings [][]whatif.Point) {
	for row := range r.rows {
		y := (float64(row) + 0.5) / float64(r.rows)
		var at []float64
		for _, ring := range rings {
			for i, p := range ring {
				q := ring[(i+1)%len(ring)]
				if (p.Y > y) != (q.Y > y) {
					at = append(at, p.X+(y-p.Y)/(q.Y-p.Y)*(q.X-p.X))
				}
			}
		}
		slices.Sort(at)
		for i := 0; i+1 < len(at); i += 2 {
			from, to := int(math.Ceil(at[i]*float64(r.cols)-0.5)), int(math.Floor(at[i+1]*float64(r.cols)-0.5))
			for col := max(from, 0); col <= min(to, r.cols-1); col++ {
				r.region[row*r.cols+col] = region
			}
		}
	}
}

// measure finds how far each point is from another region, by two passes.
func (r *raster) measure() {
	for row := range r.rows {
		for col := range r.cols {
			r.clear[row*r.cols+col] = min(r.beside(row, col, -1, 0), r.beside(row, col, 0, -1)) + 1
		}
	}
	for row := r.rows - 1; row >= 0; row-- {
		for col := r.cols - 1; col >= 0; col-- {
			i := row*r.cols + col
			r.clear[i] = min(r.clear[i], r.beside(row, col, 1, 0)+1, r.beside(row, col, 0, 1)+1)
		}
	}
}

// beside is the distance that a neighbour has, 0 where it is of another region.
func (r *raster) beside(row, col, up, right int) int {
	if row+up < 0 || row+up >= r.rows || col+right < 0 || col+right >= r.cols {
		return 0
	}
	i := (row+up)*r.cols + col + right
	if r.region[i] != r.region[row*r.cols+col] {
		return 0
	}
	return r.clear[i]
}

// at is the index of the point at a place, −1 outside the plot.
func (r *raster) at(p vg.Point) int {
	col, row := int(math.Floor(float64(p.X/grain))), int(math.Floor(float64(p.Y/grain)))
	if col < 0 || row < 0 || col >= r.cols || row >= r.rows {
		return -1
	}
	return row*r.cols + col
}

// rule marks the points of a line.
func (r *raster) rule(t *track, bit uint64) {
	for s := vg.Length(0); s <= t.length(); s += grain / 2 {
		if at := r.at(t.at(s)); at >= 0 {
			r.lined[at] |= bit
		}
	}
}

// sums are counts over rectangles: each entry is the count left of and below it.
type sums struct {
	cols  int
	total []int
}

func (r *raster) sums(of func(row, col int) int) sums {
	s := sums{r.cols + 1, make([]int, (r.cols+1)*(r.rows+1))}
	for row := range r.rows {
		line := 0
		for col := range r.cols {
			line += of(row, col)
			s.total[(row+1)*s.cols+col+1] = s.total[row*s.cols+col+1] + line
		}
	}
	return s
}

// count is the sum over columns col0 … col1−1 and rows row0 … row1−1.
func (s sums) count(col0, row0, col1, row1 int) int {
	if col1 <= col0 || row1 <= row0 {
		return 0
	}
	return s.total[row1*s.cols+col1] - s.total[row0*s.cols+col1] - s.total[row1*s.cols+col0] + s.total[row0*s.cols+col0]
}

// room finds rectangles that are free.
type room struct {
	*raster
	across, up, taken, lined sums
}

func (r *raster) room() room {
	other := func(row, col, up, right int) int {
		if row-up < 0 || col-right < 0 || r.region[(row-up)*r.cols+col-right] == r.region[row*r.cols+col] {
			return 0
		}
		return 1
	}
	return room{r,
		r.sums(func(row, col int) int { return other(row, col, 0, 1) }),
		r.sums(func(row, col int) int { return other(row, col, 1, 0) }),
		r.sums(func(row, col int) int { return r.taken[row*r.cols+col] }),
		r.sums(func(row, col int) int { return bits.OnesCount64(r.lined[row*r.cols+col]) })}
}

// best finds the place of the middle of a rectangle within a region, not over what
// is taken: away from lines if possible, and then where it has most air. ok is false
// where there is none.
func (o *room) best(region, wide, high int) (col, row int, overLines int, ok bool) {
	const airy = 12 // more air than this counts no more
	least, most := math.MaxInt, -1.0
	for r0 := 0; r0+high <= o.rows; r0++ {
		for c0 := 0; c0+wide <= o.cols; c0++ {
			c1, r1 := c0+wide, r0+high
			middle := (r0+high/2)*o.cols + c0 + wide/2
			if o.region[middle] != region || o.mixed(c0, r0, c1, r1) || o.taken.count(c0, r0, c1, r1) > 0 {
				continue
			}
			crossed := o.lined.count(c0, r0, c1, r1)
			air := float64(min(o.edge(c0, r0, c1, r1), airy)) + 0.02*float64(o.clear[middle])
			if crossed < least || crossed == least && air > most+1e-9 {
				least, most, ok = crossed, air, true
				col, row = c0+wide/2, r0+high/2
			}
		}
	}
	return col, row, least, ok
}

// mixed reports whether a rectangle holds more than one region.
func (o *room) mixed(c0, r0, c1, r1 int) bool {
	return o.across.count(c0+1, r0, c1, r1) > 0 || o.up.count(c0, r0+1, c1, r1) > 0
}

// edge is the least distance of the corners and sides of a rectangle from another region.
func (o *room) edge(c0, r0, c1, r1 int) int {
	least := math.MaxInt
	for _, col := range []int{c0, (c0 + c1) / 2, c1 - 1} {
		for _, row := range []int{r0, (r0 + r1) / 2, r1 - 1} {
			least = min(least, o.clear[row*o.cols+col])
		}
	}
	return least
}

// points is how many points of the raster a length takes.
func points(l vg.Length) int { return int(math.Ceil(float64(l / grain))) }
