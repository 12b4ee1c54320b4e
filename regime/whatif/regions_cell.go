package whatif

import (
	"cmp"
	"math"
	"slices"
)

// How far cells are divided: where borders run through a cell in a way that its
// edges do not settle, and where nothing is left but a junction of three regions.
const (
	finest   = 12 // halvings of a cell of the net
	Junction = 1.0 / steps / (1 << finest)
	narrow   = 6    // halvings of an edge of the net in search of something narrow
	smooth   = 2e-4 // how far a border may lie from the straight line between two vertices
	bends    = 6    // halvings of such a line
)

// cell is a square of the map between four edges.
type cell struct {
	low, high                Point
	bottom, right, top, left *edge
}

// link leads from one cut to another through a cell, with a zone to its left.
type link struct {
	from, to    *cut
	path        []Point // between them
	left, right *Zone
	junction    bool // path is the point at which three regions or more meet
	back        bool // the same way as the link before it, backwards
}

// crossing is a cut as one meets it going around a cell, anticlockwise.
type crossing struct {
	*cut
	side          int // of the cell: 0 bottom, 1 right, 2 top, 3 left
	before, after *Zone
}

// How often what was met on an edge, and is not what the edge says, leads to its
// being followed anew.
const (
	rounds = 6 // of the net
	tries  = 4 // within a cell of it
)

// counts reports whether anything is known on both sides.
func (k crossing) counts() bool { return k.before != unknown && k.after != unknown }

// cells draws the borders through all cells of a web. A cell that is divided may
// meet on its edges what was not found when they were followed, since it is narrow:
// such edges are followed anew, and the cells beside them drawn again.
func (t *tracer) cells(w *web) ([]link, error) {
	drawn := make([][]link, steps*steps)
	todo := make([]int, len(drawn))
	for i := range todo {
		todo[i] = i
	}
	for round := 1; len(todo) > 0; round++ {
		met := make([][]meeting, len(todo))
		err := t.each(len(todo), func(k int) {
			drawn[todo[k]], met[k] = t.drawNet(w.cell(todo[k]))
		})
		if err != nil || round == rounds {
			return slices.Concat(drawn...), err
		}
		if todo, err = t.amend(w, slices.Concat(met...)); err != nil {
			return nil, err
		}
	}
	return slices.Concat(drawn...), nil
}

// cell is a cell of the net by its number.
func (w *web) cell(i int) *cell {
	col, row := i/steps, i%steps
	return &cell{low: w.nodes[col][row].at, high: w.nodes[col+1][row+1].at,
		bottom: w.across[col][row], top: w.across[col][row+1], left: w.up[col][row], right: w.up[col+1][row]}
}

// meeting is a node on an edge whose zone is not the one that the edge says.
type meeting struct {
	on *edge
	node
}

// amend follows anew the edges of a net on which something was met, and lists the
// cells beside them.
func (t *tracer) amend(w *web, met []meeting) ([]int, error) {
	known := map[*edge][]node{}
	for _, f := range met {
		known[f.on] = append(known[f.on], f.node)
	}
	var changed, todo []int
	for i := range edges {
		if e := *w.edge(i); len(known[e]) > 0 {
			*w.edge(i) = t.netEdge(w, i, append(known[e], e.met...))
			changed = append(changed, i)
		}
	}
	for _, i := range append(changed, t.spread(w, changed)...) {
		todo = append(todo, w.beside(i)...)
	}
	slices.Sort(todo)
	return slices.Compact(todo), t.stop.Err()
}

// beside lists the cells on both sides of an edge of the net.
func (w *web) beside(i int) []int {
	k, line := i/2/(steps+1), i/2%(steps+1)
	var cells []int
	for _, l := range []int{line - 1, line} {
		switch {
		case l < 0 || l >= steps:
		case i%2 == 0:
			cells = append(cells, k*steps+l)
		default:
			cells = append(cells, l*steps+k)
		}
	}
	return cells
}

// cellDrawing draws one cell of the net.
type cellDrawing struct {
	*tracer
	inner map[span][]node // met on edges inside the cell
	outer []meeting       // met on its own edges
	again bool
}

// drawNet draws the borders through a cell of the net, and returns what it met on
// its edges.
func (t *tracer) drawNet(c *cell) (links []link, met []meeting) {
	d := &cellDrawing{tracer: t, inner: map[span][]node{}}
	for range tries {
		d.outer, d.again = nil, false
		if links = d.draw(c, 0); !d.again {
			break
		}
	}
	return links, d.outer
}

// draw draws the borders through a cell. depth is how often it was divided.
func (d *cellDrawing) draw(c *cell, depth int) []link {
	around := c.around()
	if !slices.ContainsFunc(around, crossing.counts) || d.stop.Err() != nil {
		return nil
	}
	if pairs := d.pair(c, around); pairs != nil {
		if links, ok := d.join(c, around, pairs); ok || depth == d.finest {
			return links
		}
	}
	if depth == d.finest {
		return star(around)
	}
	var links []link
	for _, quarter := range d.quarters(c) {
		links = append(links, d.draw(quarter, depth+1)...)
	}
	return links
}

// around lists the cuts on the edges of a cell, anticlockwise from its lower left
// corner.
func (c *cell) around() []crossing {
	var list []crossing
	for side, e := range []*edge{c.bottom, c.right} {
		for i, k := range e.cuts {
			list = append(list, crossing{k, side, e.zones[i], e.zones[i+1]})
		}
	}
	for side, e := range []*edge{c.top, c.left} {
		for i, k := range slices.Backward(e.cuts) {
			list = append(list, crossing{k, side + 2, e.zones[i+1], e.zones[i]})
		}
	}
	return list
}

// star leads all borders to one point, where a cell is as small as a junction is
// known.
func star(around []crossing) []link {
	var centre Point
	for _, k := range around {
		centre.X += k.at.X / float64(len(around))
		centre.Y += k.at.Y / float64(len(around))
	}
	var links []link
	for i, k := range around {
		back := around[(i+len(around)-1)%len(around)]
		links = append(links, link{from: k.cut, to: back.cut, path: []Point{centre}, left: k.before, right: k.after, junction: true})
	}
	return links
}

// mostPairings is how many ways to join the cuts of a cell are tried.
const (
	mostPairings = 4
	mostCuts     = 16
)

// pair finds which cuts of a cell a border joins: two cuts between the same zones,
// without borders that cross. Where there are several ways, the case is judged
// beside the lines. It returns the partner of each cut, or nil.
func (t *tracer) pair(c *cell, around []crossing) []int {
	ways := pairings(around)
	if len(ways) == 0 {
		return nil
	}
	if len(around) == 2 {
		return ways[0]
	}
	for _, way := range ways[:min(len(ways), mostPairings)] {
		if t.separates(c, around, way) {
			return way
		}
	}
	return nil
}

// pairings lists the ways to join cuts without crossings: first those in which
// borders pass through the cell rather than turn back, then the shortest.
func pairings(around []crossing) [][]int {
	n := len(around)
	if n%2 == 1 || n > mostCuts {
		return nil
	}
	var ways [][]int
	partner := make([]int, n)
	var join func(open []int)
	join = func(open []int) {
		if len(open) == 0 {
			ways = append(ways, slices.Clone(partner))
			return
		}
		i := open[0]
		for k := 1; k < len(open); k += 2 {
			j := open[k]
			if around[i].before != around[j].after || around[i].after != around[j].before {
				continue
			}
			partner[i], partner[j] = j, i
			// Those between the two are joined among themselves first.
			rest := ways
			ways = nil
			join(open[1:k])
			inner := ways
			ways = rest
			for _, way := range inner {
				for _, at := range open[1:k] {
					partner[at] = way[at]
				}
				join(open[k+1:])
			}
		}
	}
	all := make([]int, n)
	for i := range all {
		all[i] = i
	}
	join(all)
	length := func(way []int) float64 {
		sum := 0.0
		for i, j := range way {
			sum += apart(around[i].at, around[j].at)
			if around[i].side == around[j].side {
				sum++ // longer than any cell
			}
		}
		return sum
	}
	slices.SortStableFunc(ways, func(a, b []int) int { return cmp.Compare(length(a), length(b)) })
	return ways
}

// separates reports whether the lines of a pairing have their zones to either side.
func (t *tracer) separates(c *cell, around []crossing, way []int) bool {
	for i, j := range way {
		if i > j {
			continue
		}
		p, q := around[i].at, around[j].at
		off := min(0.25*apart(p, q), 0.4*clearance(around, way, i))
		if off < Precise {
			continue // too short, or too near another, to be told apart
		}
		n, ok := normal(p, q)
		if !ok {
			continue
		}
		middle := between(p, q, 0.5)
		// From i to j the zone before i lies to the left.
		if l := move(middle, n, off); c.holds(l) && t.look(l).zone != around[i].before {
			return false
		}
		if r := move(middle, n, -off); c.holds(r) && t.look(r).zone != around[i].after {
			return false
		}
	}
	return true
}

// clearance is the distance from the middle of the line that begins at a cut to
// the nearest other line.
func clearance(around []crossing, way []int, i int) float64 {
	middle := between(around[i].at, around[way[i]].at, 0.5)
	least := math.Inf(1)
	for a, b := range way {
		if a < b && a != i && b != i {
			least = min(least, toSegment(middle, around[a].at, around[b].at))
		}
	}
	return least
}

// toSegment is the distance of a point from a straight line between two others.
func toSegment(p, a, b Point) float64 {
	dx, dy := b.X-a.X, b.Y-a.Y
	if dx == 0 && dy == 0 {
		return apart(p, a)
	}
	t := ((p.X-a.X)*dx + (p.Y-a.Y)*dy) / (dx*dx + dy*dy)
	return apart(p, between(a, b, min(max(t, 0), 1)))
}

// normal is the direction to the left of a line from p to q.
func normal(p, q Point) (Point, bool) {
	size := apart(p, q)
	if size == 0 {
		return Point{}, false
	}
	return Point{-(q.Y - p.Y) / size, (q.X - p.X) / size}, true
}

func move(p, n Point, by float64) Point { return Point{p.X + by*n.X, p.Y + by*n.Y} }

// holds reports whether a point lies in a cell.
func (c *cell) holds(p Point) bool {
	return p.X >= c.low.X && p.X <= c.high.X && p.Y >= c.low.Y && p.Y <= c.high.Y
}

// join makes the links of a pairing. It returns false where a border turns out to
// run differently between its ends.
func (t *tracer) join(c *cell, around []crossing, way []int) ([]link, bool) {
	var links []link
	good := true
	for i, j := range way {
		if i > j {
			continue
		}
		b := bender{t, c, around[i].before, around[i].after, 0.3 * clearance(around, way, i), true}
		path := b.path(around[i].at, around[j].at, bends)
		good = good && b.good
		back := slices.Clone(path)
		slices.Reverse(back)
		links = append(links,
			link{from: around[i].cut, to: around[j].cut, path: path, left: around[i].before, right: around[i].after},
			link{from: around[j].cut, to: around[i].cut, path: back, left: around[i].after, right: around[i].before, back: true})
	}
	return links, good
}

// bender bends the straight line between two vertices of a border so that it
// follows the border.
type bender struct {
	*tracer
	c           *cell
	left, right *Zone
	free        float64 // to the nearest other border
	good        bool
}

// path returns the vertices that have to stand between two.
func (b *bender) path(p, q Point, depth int) []Point {
	n, ok := normal(p, q)
	if !ok || depth == 0 || apart(p, q) < 4*smooth {
		return nil
	}
	middle := between(p, q, 0.5)
	near := min(smooth, b.free)
	if near < Precise || b.straight(middle, n, near) {
		return nil
	}
	v, found := b.seek(middle, n, apart(p, q)/2)
	if !found {
		b.good = false
		return nil
	}
	return slices.Concat(b.path(p, v, depth-1), []Point{v}, b.path(v, q, depth-1))
}

// straight reports whether the border passes as near to a point as is smooth, so
// far as the cell goes.
func (b *bender) straight(middle, n Point, near float64) bool {
	l, r := move(middle, n, near), move(middle, n, -near)
	return (!b.c.holds(l) || b.look(l).zone == b.left) && (!b.c.holds(r) || b.look(r).zone == b.right)
}

// seek finds the border on the normal through a point.
func (b *bender) seek(middle, n Point, reach float64) (Point, bool) {
	s := b.look(middle)
	side, want := 1.0, b.left // towards the zone that is not here
	switch s.zone {
	case b.left:
		side, want = -1, b.right
	case b.right:
	default:
		return Point{}, false
	}
	reach = min(reach, b.c.room(middle, n, side))
	for range 5 {
		if reach < smooth {
			return Point{}, false
		}
		end := b.look(move(middle, n, side*reach))
		if end.zone == want {
			e := &edge{zones: []*Zone{s.zone}}
			b.follow(s, end, e)
			if len(e.cuts) != 1 {
				return Point{}, false
			}
			return e.cuts[0].at, true
		}
		reach /= 2
	}
	return Point{}, false
}

// room is how far one can go from a point before one leaves the cell.
func (c *cell) room(p, n Point, side float64) float64 {
	return min(roomAlong(p.X, side*n.X, c.low.X, c.high.X), roomAlong(p.Y, side*n.Y, c.low.Y, c.high.Y))
}

func roomAlong(x, step, low, high float64) float64 {
	switch {
	case step > 0:
		return (high - x) / step
	case step < 0:
		return (low - x) / step
	}
	return math.Inf(1)
}

// quarters divides a cell. What is known on its edges stays as it is, so that the
// cell beside sees the same.
func (d *cellDrawing) quarters(c *cell) [4]*cell {
	centre := d.look(between(c.low, c.high, 0.5))
	b0, b1 := c.bottom.halves()
	t0, t1 := c.top.halves()
	l0, l1 := c.left.halves()
	r0, r1 := c.right.halves()
	bottom, top, left, right := d.onEdge(b1), d.onEdge(t1), d.onEdge(l1), d.onEdge(r1)
	inside := func(before, a, b, after *node, beside ...*edge) *edge {
		return d.edge(before, a, b, after, append(d.hints(a.at, b.at, beside), d.inner[span{a.at, b.at}]...))
	}
	lower, upper := inside(nil, bottom, &centre, top, l0, r0), inside(bottom, &centre, top, nil, l1, r1)
	west, east := inside(nil, left, &centre, right, b0, t0), inside(left, &centre, right, nil, b1, t1)
	x0, y0, x1, y1 := c.low.X, c.low.Y, c.high.X, c.high.Y
	x, y := centre.at.X, centre.at.Y
	return [4]*cell{
		{Point{x0, y0}, Point{x, y}, b0, lower, west, l0},
		{Point{x, y0}, Point{x1, y}, b1, r0, east, lower},
		{Point{x0, y}, Point{x, y1}, west, upper, t0, l1},
		{Point{x, y}, Point{x1, y1}, east, r1, t1, upper},
	}
}

// hints judges the case between two points where bands on edges beside their line
// would cross it, going straight on or from one of these edges to the other.
func (d *cellDrawing) hints(from, to Point, beside []*edge) []node {
	var places []float64
	for n, e := range beside {
		for _, at := range e.bands() {
			places = append(places, at)
			for _, other := range beside[n+1:] {
				for _, far := range other.bands() {
					places = append(places, (at+far)/2)
				}
			}
		}
	}
	slices.Sort(places)
	var list []node
	for _, at := range slices.Compact(places) {
		list = append(list, d.look(between(from, to, at)))
	}
	return list
}

// bands lists the middles of what lies between two cuts of an edge, as parts of its
// length.
func (e *edge) bands() []float64 {
	var list []float64
	for n := 1; n < len(e.cuts); n++ {
		list = append(list, apart(e.from, between(e.cuts[n-1].at, e.cuts[n].at, 0.5))/apart(e.from, e.to))
	}
	return list
}

// onEdge judges the case at the start of an edge. The zone is the one that the edge
// says; where it is another, that is kept for the next time.
func (d *cellDrawing) onEdge(e *edge) *node {
	n := d.look(e.from)
	if n.zone == e.zones[0] {
		return &n
	}
	whole := e.origin()
	for _, k := range whole.cuts {
		if apart(k.at, n.at) < 4*Precise { // the cut itself, within what is known of it
			n.zone = e.zones[0]
			return &n
		}
	}
	if whole.ofNet {
		d.outer = append(d.outer, meeting{whole, n})
	} else {
		at := span{whole.from, whole.to}
		d.inner[at] = append(d.inner[at], n)
		d.again = true
	}
	n.zone = e.zones[0]
	return &n
}
