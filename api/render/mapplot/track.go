package mapplot

import (
	"math"
	"slices"

	"gonum.org/v1/plot/vg"
)

// track is a line on the plot that one can walk along.
type track struct {
	points []vg.Point
	along  []vg.Length // way from the start to each point
}

func newTrack(points []vg.Point) *track {
	t := &track{points: points, along: make([]vg.Length, len(points))}
	for i := 1; i < len(points); i++ {
		t.along[i] = t.along[i-1] + distance(points[i-1], points[i])
	}
	return t
}

func distance(a, b vg.Point) vg.Length {
	return vg.Length(math.Hypot(float64(b.X-a.X), float64(b.Y-a.Y)))
}

func (t *track) length() vg.Length { return t.along[len(t.along)-1] }

// at is the point after a way.
func (t *track) at(s vg.Length) vg.Point {
	i, _ := slices.BinarySearch(t.along, s)
	switch {
	case i <= 0:
		return t.points[0]
	case i >= len(t.points):
		return t.points[len(t.points)-1]
	}
	part := t.along[i] - t.along[i-1]
	if part == 0 {
		return t.points[i]
	}
	return mix(t.points[i-1], t.points[i], float64((s-t.along[i-1])/part))
}

func mix(a, b vg.Point, t float64) vg.Point {
	return vg.Point{X: a.X + vg.Length(t)*(b.X-a.X), Y: a.Y + vg.Length(t)*(b.Y-a.Y)}
}

// passes reports whether a track comes within a distance of a point.
func (t *track) passes(p vg.Point, within vg.Length) bool {
	for i := 1; i < len(t.points); i++ {
		if toSegment(p, t.points[i-1], t.points[i]) <= within {
			return true
		}
	}
	return false
}

// part is the track from one way to another.
func (t *track) part(from, to vg.Length) *track {
	points := []vg.Point{t.at(from)}
	for i, s := range t.along {
		if s > from && s < to {
			points = append(points, t.points[i])
		}
	}
	return newTrack(append(points, t.at(to)))
}

// toSegment is the distance of a point from a straight line between two others.
func toSegment(p, a, b vg.Point) vg.Length {
	dx, dy := b.X-a.X, b.Y-a.Y
	if dx == 0 && dy == 0 {
		return distance(p, a)
	}
	t := float64(((p.X-a.X)*dx + (p.Y-a.Y)*dy) / (dx*dx + dy*dy))
	return distance(p, mix(a, b, min(max(t, 0), 1)))
}

// box is a rectangle that may be turned: where words stand, and lines leave a gap.
type box struct {
	middle      vg.Point
	width, high vg.Length
	angle       float64
}

// local is a point as seen from a box: from its middle, along its width and height.
func (b *box) local(p vg.Point) vg.Point {
	sin, cos := math.Sincos(b.angle)
	x, y := float64(p.X-b.middle.X), float64(p.Y-b.middle.Y)
	return vg.Point{X: vg.Length(x*cos + y*sin), Y: vg.Length(y*cos - x*sin)}
}

// global is the way back.
func (b *box) global(p vg.Point) vg.Point {
	sin, cos := math.Sincos(b.angle)
	x, y := float64(p.X), float64(p.Y)
	return vg.Point{X: b.middle.X + vg.Length(x*cos-y*sin), Y: b.middle.Y + vg.Length(x*sin+y*cos)}
}

// grid lists points of a box, no further apart than the raster.
func (b *box) grid() []vg.Point {
	across, up := 1+int(b.width/grain), 1+int(b.high/grain)
	var list []vg.Point
	for i := range across + 1 {
		for k := range up + 1 {
			list = append(list, b.global(vg.Point{X: b.width * (vg.Length(i)/vg.Length(across) - 0.5), Y: b.high * (vg.Length(k)/vg.Length(up) - 0.5)}))
		}
	}
	return list
}

// covers is the part of a straight line that lies in a box: from and to, between 0
// and 1; from ≥ to where none does.
func (b *box) covers(p, q vg.Point) (from, to float64) {
	a, c := b.local(p), b.local(q)
	from, to = 0, 1
	for _, d := range [][3]float64{
		{float64(a.X), float64(c.X), float64(b.width / 2)},
		{float64(a.Y), float64(c.Y), float64(b.high / 2)},
	} {
		low, high := clip(d[0], d[1], d[2])
		from, to = max(from, low), min(to, high)
	}
	return from, to
}

// clip is where a number that runs from a to b lies within ±half.
func clip(a, b, half float64) (from, to float64) {
	if a == b {
		if math.Abs(a) <= half {
			return 0, 1
		}
		return 1, 0
	}
	s, t := (-half-a)/(b-a), (half-a)/(b-a)
	return min(s, t), max(s, t)
}

// gaps cuts out of a line what lies in boxes, and returns what is left.
func gaps(points []vg.Point, boxes []box) [][]vg.Point {
	var all [][]vg.Point
	var piece []vg.Point
	end := func() {
		if len(piece) > 1 {
			all = append(all, piece)
		}
		piece = nil
	}
	for i := 1; i < len(points); i++ {
		p, q := points[i-1], points[i]
		at := 0.0
		for _, g := range covered(p, q, boxes) {
			if g[0] > at {
				piece = append(begin(piece, mix(p, q, at)), mix(p, q, g[0]))
			}
			end()
			at = max(at, g[1])
		}
		if at < 1 {
			piece = append(begin(piece, mix(p, q, at)), q)
		}
	}
	end()
	return all
}

func begin(piece []vg.Point, p vg.Point) []vg.Point {
	if len(piece) == 0 {
		return []vg.Point{p}
	}
	return piece
}

// covered lists the parts of a straight line that lie in boxes, in order.
func covered(p, q vg.Point, boxes []box) [][2]float64 {
	var list [][2]float64
	for i := range boxes {
		if from, to := boxes[i].covers(p, q); from < to {
			list = append(list, [2]float64{from, to})
		}
	}
	slices.SortFunc(list, func(a, b [2]float64) int {
		switch {
		case a[0] < b[0]:
			return -1
		case a[0] > b[0]:
			return 1
		}
		return 0
	})
	return list
}
