package whatif

import (
	"cmp"
	"math"
	"slices"
)

// tracer follows zones along lines: the classes of a map, or the two sides of an
// assumption's limit.
type tracer struct {
	*mapper
	read    func(*spot) node
	turning []int   // the assumptions whose values decide which zone a node is in
	precise float64 // how near to the true place a cut lies
	search  int     // how often an edge of the net may be halved in search of what is narrow
	finest  int     // how often a cell of the net may be divided
}

// node is a spot as a tracer sees it.
type node struct {
	at    Point
	zone  *Zone
	value []float64 // by index of the assumption: it turns at 0; NaN where it has none
}

func (t *tracer) look(p Point) node { return t.read(t.mapper.look(p)) }

// cut is a place on an edge at which the zone changes.
type cut struct{ at Point }

// edge is a straight line on the map, towards growing x or y, with the zones that
// follow each other along it: one more than there are cuts.
type edge struct {
	from, to Point
	cuts     []*cut
	zones    []*Zone
	whole    *edge  // the edge that this is a part of; nil: it is whole
	ofNet    bool   // it is an edge of the net, which two cells of it share
	met      []node // nodes between its ends that it was made to pass
}

// origin is the whole edge.
func (e *edge) origin() *edge {
	if e.whole != nil {
		return e.whole
	}
	return e
}

// span names an edge by its ends.
type span struct{ from, to Point }

// How closely an edge is searched: where the slope of a value, times a factor for
// its bends, lets it turn between two points.
const (
	bending = 1.6
	least   = 0.03 // change along an edge that is reckoned with in any case
	always  = 2    // halvings of an edge along which a value turns
)

// edge follows the zones from one node to the next. before and after are the
// nodes on the same line beside these, nil where there is none: they tell how steep
// values are, and so whether something narrow may lie between two nodes that agree,
// as the band of a hazard does. known are nodes between them that were met already.
func (t *tracer) edge(before, a, b, after *node, known []node) *edge {
	e := &edge{from: a.at, to: b.at, zones: []*Zone{a.zone}}
	steep := make([]float64, len(t.turning))
	for k, i := range t.turning {
		steep[k] = least
		for _, pair := range [][2]*node{{before, a}, {a, b}, {b, after}} {
			if pair[0] == nil || pair[1] == nil {
				continue
			}
			if d := bending * math.Abs(pair[1].value[i]-pair[0].value[i]); d > steep[k] && !math.IsInf(d, 0) {
				steep[k] = d
			}
		}
	}
	from, size := *a, apart(a.at, b.at)
	known = slices.Clone(known)
	slices.SortStableFunc(known, func(m, n node) int { return cmp.Compare(apart(a.at, m.at), apart(a.at, n.at)) })
	for _, to := range append(known, *b) {
		t.walk(from, to, steep, t.search, apart(from.at, to.at)/size, e)
		from = to
	}
	return e
}

// walk adds the cuts between two points that lie a part of an edge apart.
func (t *tracer) walk(a, b node, steep []float64, depth int, part float64, e *edge) {
	switch {
	case depth > 0 && t.mayTurn(a, b, steep, part, depth > t.search-always):
		middle := t.look(between(a.at, b.at, 0.5))
		t.walk(a, middle, steep, depth-1, part/2, e)
		t.walk(middle, b, steep, depth-1, part/2, e)
	case a.zone != b.zone:
		t.follow(a, b, e)
	}
}

// mayTurn reports whether a value may turn unseen between two points: one that is
// on the same side of 0 at both could, with the slope that is known, reach the other
// side and come back. One that turns is seen to; but where it turns once it may turn
// thrice, which turned tells to look for.
func (t *tracer) mayTurn(a, b node, steep []float64, part float64, turned bool) bool {
	for k, i := range t.turning {
		v, w := a.value[i], b.value[i]
		switch {
		case math.Abs(v) < rounding && math.Abs(w) < rounding: // it rests on its limit
		case (v > 0) != (w > 0):
			if turned && !math.IsInf(v-w, 0) && !math.IsNaN(v-w) {
				return true
			}
		case math.Abs(v)+math.Abs(w) < max(steep[k]*part, bending*math.Abs(v-w)):
			return true
		}
	}
	return false
}

// follow adds the cuts between two points of different zones.
func (t *tracer) follow(a, b node, e *edge) {
	lo, hi := a, b
	kept := 0 // how often one end has stayed: negative for lo
	precise := t.precise
	if lo.zone == unknown || hi.zone == unknown {
		precise = smooth // where a line only ends
	}
	for apart(lo.at, hi.at) > precise {
		middle := t.look(between(lo.at, hi.at, t.guess(lo, hi, kept)))
		switch middle.zone {
		case lo.zone:
			lo, kept = middle, max(kept, 0)+1
		case hi.zone:
			hi, kept = middle, min(kept, 0)-1
		default: // a third zone between them
			t.follow(lo, middle, e)
			t.follow(middle, hi, e)
			return
		}
	}
	e.cuts = append(e.cuts, &cut{between(lo.at, hi.at, 0.5)})
	e.zones = append(e.zones, hi.zone)
}

// guess is where between two points, from 0 to 1, the zone changes: at the root
// of the chord of a value that turns, else in the middle. What is found is always a
// change of zone; the guess only makes it quick. kept tells how often in a row the
// far end has stayed: then the guess goes beyond the root, so that the next point
// falls on its other side.
func (t *tracer) guess(lo, hi node, kept int) float64 {
	if kept > 8 || kept < -8 {
		return 0.5
	}
	s := 0.5
	for _, i := range t.turning {
		if v, w := lo.value[i], hi.value[i]; v > 0 && w <= 0 || v <= 0 && w > 0 {
			s = v / (v - w)
			break
		}
	}
	size := apart(lo.at, hi.at)
	over := 0.4 * t.precise / size * math.Pow(8, math.Abs(float64(kept))-1)
	switch {
	case kept > 0:
		s += over
	case kept < 0:
		s -= over
	}
	if math.IsNaN(s) {
		return 0.5
	}
	off := min(0.4*t.precise/size, 0.5)
	return min(max(s, off), 1-off)
}

func apart(a, b Point) float64 { return math.Hypot(b.X-a.X, b.Y-a.Y) }

func between(a, b Point, t float64) Point {
	return Point{a.X + t*(b.X-a.X), a.Y + t*(b.Y-a.Y)}
}

// zoneAt is the zone at a position of the edge, given by the distance from its
// start as a part of its length.
func (e *edge) zoneAt(t float64) (z *Zone, cutsBefore int) {
	size := apart(e.from, e.to)
	n := 0
	for n < len(e.cuts) && apart(e.from, e.cuts[n].at) <= t*size {
		n++
	}
	return e.zones[n], n
}

// halves divides an edge at its middle.
func (e *edge) halves() (first, second *edge) {
	middle := between(e.from, e.to, 0.5)
	_, n := e.zoneAt(0.5)
	return &edge{from: e.from, to: middle, cuts: e.cuts[:n:n], zones: e.zones[: n+1 : n+1], whole: e.origin()},
		&edge{from: middle, to: e.to, cuts: e.cuts[n:], zones: e.zones[n:], whole: e.origin()}
}
