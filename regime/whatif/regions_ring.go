package whatif

import (
	"cmp"
	"math"
	"slices"
)

// leaving names the one link that leaves a cut with a zone to its left.
type leaving struct {
	from *cut
	left *Zone
}

// regionsOf makes regions of the links of all cells and of the frame.
func regionsOf(links []link, w *web) []Region {
	frame := w.frame()
	if len(frame) == 0 { // nothing crosses the frame
		z := w.nodes[0][0].zone
		outline := []Point{{0, 0}, {1, 0}, {1, 1}, {0, 1}}
		return sorted(nest([]ring{{z, outline, 1}}, rings(links)))
	}
	return sorted(nest(nil, rings(slices.Concat(links, frame))))
}

// frame links the cuts on the frame of the map, anticlockwise.
func (w *web) frame() []link {
	var sides [4][]crossing
	for i := range steps {
		c := cell{bottom: w.across[i][0], right: w.up[steps][i], top: w.across[i][steps], left: w.up[0][i]}
		for side, e := range []*edge{c.bottom, c.right, c.top, c.left} {
			one := cell{bottom: &edge{}, right: &edge{}, top: &edge{}, left: &edge{}}
			*[]**edge{&one.bottom, &one.right, &one.top, &one.left}[side] = e
			found := one.around()
			if side < 2 {
				sides[side] = append(sides[side], found...)
			} else {
				sides[side] = append(found, sides[side]...)
			}
		}
	}
	corners := []Point{{1, 0}, {1, 1}, {0, 1}, {0, 0}}
	var links []link
	for side, list := range sides {
		for _, k := range list {
			links = append(links, link{from: k.cut, left: k.after})
		}
		if len(links) > 0 {
			last := &links[len(links)-1]
			last.path = append(last.path, corners[side])
		}
	}
	if len(links) == 0 {
		return nil
	}
	// The corners before the first cut belong to the last link.
	last := &links[len(links)-1]
	for side := 0; side < 4 && len(sides[side]) == 0; side++ {
		last.path = append(last.path, corners[side])
	}
	for i := range links {
		links[i].to = links[(i+1)%len(links)].from
	}
	return links
}

// ring is a closed line with a zone to its left.
type ring struct {
	*Zone
	points []Point
	area   float64 // negative for one that runs clockwise: a hole
}

// rings follows links until they close.
func rings(links []link) []ring {
	next := make(map[leaving]int, len(links))
	for i, l := range links {
		next[leaving{l.from, l.left}] = i
	}
	used := make([]bool, len(links))
	var list []ring
	for start, l := range links {
		r := ring{Zone: l.left}
		for i := start; !used[i]; {
			used[i] = true
			r.points = append(append(r.points, links[i].from.at), links[i].path...)
			following, known := next[leaving{links[i].to, l.left}]
			if !known {
				break
			}
			i = following
		}
		if r.area = areaOf(r.points); r.area != 0 {
			r.points = thinned(append(r.points, r.points[0]))
			r.points = r.points[:len(r.points)-1]
			list = append(list, r)
		}
	}
	return list
}

// areaOf is the area that a ring encloses, positive where it runs anticlockwise.
func areaOf(points []Point) float64 {
	sum := 0.0
	for i, p := range points {
		q := points[(i+1)%len(points)]
		sum += p.X*q.Y - q.X*p.Y
	}
	return sum / 2
}

// nest gives each hole to the smallest outline of its zone around it.
func nest(outer, rings []ring) []Region {
	for _, r := range rings {
		if r.area > 0 {
			outer = append(outer, r)
		}
	}
	regions := make([]Region, len(outer))
	for i, o := range outer {
		regions[i] = Region{Zone: o.Zone, Rings: [][]Point{o.points}, Area: o.area}
	}
	for _, hole := range rings {
		if hole.area > 0 {
			continue
		}
		around := -1
		for i, o := range outer {
			if o.Zone == hole.Zone && o.area > -hole.area && encloses(o.points, hole.points[0]) && (around < 0 || o.area < outer[around].area) {
				around = i
			}
		}
		if around >= 0 {
			regions[around].Rings = append(regions[around].Rings, hole.points)
			regions[around].Area += hole.area
		}
	}
	return regions
}

// encloses reports whether a point lies inside a ring.
func encloses(ring []Point, p Point) bool {
	inside := false
	for i, a := range ring {
		b := ring[(i+1)%len(ring)]
		if (a.Y > p.Y) != (b.Y > p.Y) && p.X < a.X+(p.Y-a.Y)/(b.Y-a.Y)*(b.X-a.X) {
			inside = !inside
		}
	}
	return inside
}

// Holds reports whether a point lies in a region.
func (r *Region) Holds(p Point) bool {
	for i, ring := range r.Rings {
		if encloses(ring, p) != (i == 0) {
			return false
		}
	}
	return true
}

// At returns the region at a point, nil outside the map.
func (m *Map) At(p Point) *Region {
	for i := range m.Regions {
		if m.Regions[i].Holds(p) {
			return &m.Regions[i]
		}
	}
	return nil
}

func sorted(regions []Region) []Region {
	slices.SortStableFunc(regions, func(a, b Region) int { return cmp.Compare(b.Area, a.Area) })
	return regions
}

// piece is a part of a border within one cell. to is nil at a junction.
type piece struct {
	from, to    *cut
	points      []Point
	left, right *Zone
}

// bordersOf chains the borders of all cells.
func bordersOf(links []link) []Border {
	var pieces []piece
	ends := map[*cut][]int{}
	add := func(p piece) {
		for _, k := range []*cut{p.from, p.to} {
			if k != nil {
				ends[k] = append(ends[k], len(pieces))
			}
		}
		pieces = append(pieces, p)
	}
	for _, l := range links {
		switch {
		case l.junction:
			add(piece{l.from, nil, append([]Point{l.from.at}, l.path...), l.left, l.right})
		case !l.back:
			add(piece{l.from, l.to, slices.Concat([]Point{l.from.at}, l.path, []Point{l.to.at}), l.left, l.right})
		}
	}
	c := chainer{pieces, ends, make([]bool, len(pieces))}
	var list []Border
	for _, closed := range []bool{false, true} {
		for i := range pieces {
			if b, ok := c.chain(i, closed); ok {
				list = append(list, b)
			}
		}
	}
	return list
}

type chainer struct {
	pieces []piece
	ends   map[*cut][]int
	used   []bool
}

// chain follows a border from a piece at one of its ends; a closed one from any.
func (c *chainer) chain(i int, closed bool) (Border, bool) {
	p := c.pieces[i]
	if c.used[i] {
		return Border{}, false
	}
	turned := p.to == nil || len(c.ends[p.to]) == 1
	if !closed && !turned && len(c.ends[p.from]) > 1 {
		return Border{}, false
	}
	if turned {
		p = p.turned()
	}
	b := Border{Left: p.left, Right: p.right, Points: slices.Clone(p.points), Closed: closed, Ends: [2]bool{p.from == nil, false}}
	first := p.from
	for {
		c.used[i] = true
		if p.to == nil {
			b.Ends[1] = true
			break
		}
		next := -1
		for _, k := range c.ends[p.to] {
			if !c.used[k] {
				next = k
			}
		}
		if next < 0 {
			break
		}
		at := p.to
		i, p = next, c.pieces[next]
		if p.from != at {
			p = p.turned()
		}
		b.Points = append(b.Points, p.points[1:]...)
	}
	b.Points = thinned(b.Points)
	if closed && p.to == first {
		b.Points = b.Points[:len(b.Points)-1]
	}
	return b, len(b.Points) > 1 && lengthOf(b.Points) > 0
}

func (p piece) turned() piece {
	points := slices.Clone(p.points)
	slices.Reverse(points)
	return piece{p.to, p.from, points, p.right, p.left}
}

// thinned leaves out the points that lie on the straight line between others, as
// precisely as they are known. It keeps both ends.
func thinned(points []Point) []Point {
	if len(points) < 3 {
		return points
	}
	first, last := points[0], points[len(points)-1]
	far, at := 0.0, 0
	for i, p := range points[1 : len(points)-1] {
		if d := toSegment(p, first, last); d > far {
			far, at = d, i+1
		}
	}
	if far <= Precise {
		return []Point{first, last}
	}
	return append(thinned(points[:at+1:at+1]), thinned(points[at:])[1:]...)
}

func lengthOf(points []Point) float64 {
	sum := 0.0
	for i := 1; i < len(points); i++ {
		sum += math.Hypot(points[i].X-points[i-1].X, points[i].Y-points[i-1].Y)
	}
	return sum
}
