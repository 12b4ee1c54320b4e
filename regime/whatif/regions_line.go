package whatif

import (
	"math"

	"regimed/regime/assumption"
)

// exact is how near to 0 ln of utilisation is at a vertex of a line that does not
// leap.
const exact = 5e-7

// rounding is how far above its limit a value still counts as on it, as a verdict
// has it: one that rests on its limit must not flicker.
const rounding = 1e-9

// The sides of a line of utilisation 1, as zones.
var (
	inside  = &Zone{}
	beyond  = &Zone{}
	unknown = &Zone{}
)

// lines draws, for each of some assumptions, where its utilisation is 1.
func (m *mapper) lines(n *net, assumptions []int) ([]Line, error) {
	var all []Line
	for _, i := range assumptions {
		t := &tracer{mapper: m, turning: []int{i}, precise: Precise / 1000, search: narrow - 2, finest: finest / 2,
			read: func(s *spot) node { return node{s.at, sideOf(s.load[i]), s.load} }}
		links, _, err := t.trace(n)
		if err != nil {
			return nil, err
		}
		for _, b := range bordersOf(links) {
			if b.Left == unknown || b.Right == unknown {
				continue
			}
			if b.trim(); len(b.Points) > 1 {
				all = append(all, Line{Entry: assumption.Catalogue[i], Points: b.Points, Closed: b.Closed, Leaps: m.leaps(b.Points, i)})
			}
		}
	}
	return all, m.stop.Err()
}

// trim leaves out ends that are junctions: where a line only ends, its end is
// known less well.
func (b *Border) trim() {
	if b.Ends[1] {
		b.Points = b.Points[:len(b.Points)-1]
	}
	if b.Ends[0] {
		b.Points = b.Points[1:]
	}
}

func sideOf(load float64) *Zone {
	switch {
	case math.IsNaN(load):
		return unknown
	case load > rounding:
		return beyond
	default:
		return inside
	}
}

// leaps lists the points of a line at which the value is not 1.
func (m *mapper) leaps(points []Point, i int) []int {
	var list []int
	for k, p := range points {
		if !(math.Abs(m.look(p).load[i]) <= exact) {
			list = append(list, k)
		}
	}
	return list
}
