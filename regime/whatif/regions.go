package whatif

import (
	"context"
	"math"
	"runtime"
	"slices"
	"strings"
	"sync"
	"sync/atomic"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/regime/ladder"
)

// Map is where in the plane of two inputs which class of model is recommended,
// the other inputs as in the case.
//
// Positions in it run from 0 to 1 along each axis, in the spacing of the axis:
// [MapAxis.At] makes an input of them. A vertex of a border lies within Precise of
// the place where the recommended class changes.
type Map struct {
	Case    *input.Case
	X, Y    MapAxis
	Regions []Region // the largest first
	Borders []Border
	Lines   []Line
	Here    *Point // where the case stands; nil where it lies outside the map or does not give both inputs
	Zone    *Zone  // that of the case
	Cloud   *Cloud // nil where both inputs are certain
	Judged  int    // points at which the case was judged
}

// Precise is how near to the true place a vertex lies, as a part of the axis.
const Precise = 1e-6

// Point is a position on a map.
type Point struct{ X, Y float64 }

// Zone is what holds at a point: the recommended class, or the inputs that were
// refused there.
type Zone struct {
	Class   *ladder.Class
	Outside []string // paths of the inputs; empty where there is a class
}

// Region is a connected part of a map with one answer.
type Region struct {
	*Zone
	Rings [][]Point // the outline, anticlockwise, then holes, clockwise; the last point is not the first again
	Area  float64   // of the map: 1
}

// Border is a line between two regions, or between two parts of one of them and
// a narrow other one.
type Border struct {
	Left, Right *Zone // as one follows the points
	Points      []Point
	Closed      bool    // the last point leads to the first
	Ends        [2]bool // whether an end is a junction of three regions or more, which is known less precisely: within Junction
}

// Line is where the most loaded estimate of an assumption reaches its limit:
// utilisation 1.
type Line struct {
	Entry  *assumption.Entry
	Points []Point
	Closed bool  // the last point leads to the first
	Leaps  []int // the points at which the estimate leaps from one side of its limit to the other
}

// mapper computes one map.
type mapper struct {
	c      *input.Case
	x, y   MapAxis
	stop   context.Context
	probes sync.Pool // of *input.Case
	judged atomic.Int64

	names sync.Mutex
	zones map[string]*Zone

	matters []atomic.Bool // by index of the assumption: a class that occurs rests on it, or fell by it
}

func newMapper(ctx context.Context, c *input.Case, x, y MapAxis) *mapper {
	m := &mapper{c: c, x: x, y: y, stop: ctx, zones: map[string]*Zone{}, matters: make([]atomic.Bool, len(assumption.Catalogue))}
	m.probes.New = func() any { return c.Clone() }
	return m
}

// NewMap computes the map of a case over two inputs. Where nothing at all can be
// computed on it, it returns what is wrong in its middle. It ends early, with an
// error, only where the context does.
func NewMap(ctx context.Context, c *input.Case, x, y MapAxis) (*Map, []input.Violation, error) {
	m := newMapper(ctx, c, x, y)
	net, err := m.net()
	if err != nil {
		return nil, nil, err
	}
	if net.empty() {
		if violations := m.wrong(Point{0.5, 0.5}); len(violations) > 0 {
			return nil, violations, nil
		}
	}
	turning := m.mattering()
	classes := &tracer{mapper: m, turning: turning, precise: Precise, search: narrow, finest: finest,
		read: func(s *spot) node { return node{s.at, s.zone, s.out} }}
	links, web, err := classes.trace(net)
	if err != nil {
		return nil, nil, err
	}
	lines, err := m.lines(net, turning)
	if err != nil {
		return nil, nil, err
	}
	r := &Map{Case: c, X: x, Y: y, Regions: regionsOf(links, web), Borders: bordersOf(links), Lines: lines}
	m.place(r)
	r.Judged = int(m.judged.Load())
	return r, nil, ctx.Err()
}

// wrong is what is wrong with the case at a point.
func (m *mapper) wrong(p Point) []input.Violation {
	c := m.c.Clone()
	if ok := m.x.put(c, p.X); !m.y.put(c, p.Y) || !ok {
		return nil
	}
	a, violations := regime.Judge(c)
	if len(violations) == 0 {
		a.Release()
	}
	return violations
}

// trace follows all edges of a net, and joins what it finds through its cells.
func (t *tracer) trace(n *net) ([]link, *web, error) {
	w, err := t.web(n)
	if err != nil {
		return nil, nil, err
	}
	links, err := t.cells(w)
	return links, w, err
}

// place marks where the case stands.
func (m *mapper) place(r *Map) {
	r.Cloud = cloudOf(m.c, m.x, m.y)
	x, y := m.c.At(m.x.Place), m.c.At(m.y.Place)
	if x == nil || y == nil || x.Gauge != m.x.gauge || y.Gauge != m.y.gauge {
		return
	}
	p := Point{m.x.Position(x.Value), m.y.Position(y.Value)}
	if within(p.X) && within(p.Y) {
		r.Here, r.Zone = &p, m.look(p).zone
	}
}

func within(s float64) bool { return s >= 0 && s <= 1 }

// spot is the case judged at one point.
type spot struct {
	at   Point
	zone *Zone
	// By index of the assumption, of the most loaded part that is of interest,
	// NaN where there is none: ln of utilisation over the factor in the test for
	// invalid, so that above 0 the assumption is ruled out; and ln of utilisation,
	// −Inf where the effect cannot occur.
	out, load []float64
}

// look judges the case at a point.
func (m *mapper) look(p Point) *spot {
	m.judged.Add(1)
	s := &spot{at: p, out: make([]float64, len(assumption.Catalogue)), load: make([]float64, len(assumption.Catalogue))}
	c := m.probes.Get().(*input.Case)
	defer m.probes.Put(c)
	m.x.put(c, p.X)
	okY := m.y.put(c, p.Y)
	okX := m.x.put(c, p.X) // once more: both may be ends of one interval
	switch {
	case !okX && !okY:
		s.zone = m.outside(m.x.Name(), m.y.Name())
	case !okX:
		s.zone = m.outside(m.x.Name())
	case !okY:
		s.zone = m.outside(m.y.Name())
	}
	if s.zone != nil {
		s.nothing()
		return s
	}
	a, violations := regime.Judge(c)
	if len(violations) > 0 {
		var names []string
		for _, v := range violations {
			names = append(names, strings.ReplaceAll(strings.TrimPrefix(v.Pointer, "/"), "/", "."))
		}
		s.zone = m.outside(names...)
		s.nothing()
		return s
	}
	s.zone = m.zone(a.Recommendation.Class.ID, &Zone{Class: a.Recommendation.Class})
	s.read(a)
	m.note(&a.Recommendation)
	a.Release()
	return s
}

// nothing is what is known where nothing can be computed.
func (s *spot) nothing() {
	for i := range s.out {
		s.out[i], s.load[i] = math.NaN(), math.NaN()
	}
}

// read takes from an answer what a point has to keep.
func (s *spot) read(a *regime.Answer) {
	for i := range a.Findings {
		f := &a.Findings[i]
		out, load := math.Inf(-1), math.Inf(-1)
		parts := f.Parts()
		for j := range parts {
			p := &parts[j]
			if p.Waits || !f.OfInterest || !a.Interest.Has(p.Measure) {
				continue
			}
			u := math.Log(p.Utilisation)
			load, out = math.Max(load, u), math.Max(out, u-math.Log(p.Inner))
		}
		if math.IsInf(load, -1) {
			out = math.NaN()
			if f.Verdict != finding.NotApplicable {
				load = math.NaN()
			}
		}
		s.out[i], s.load[i] = out, load
	}
}

// note keeps which assumptions decide.
func (m *mapper) note(r *ladder.Recommendation) {
	for _, e := range r.Class.RestsOn {
		m.matters[e.Index()].Store(true)
	}
	for i := range r.Rejected {
		for _, e := range r.Rejected[i].Because {
			m.matters[e.Index()].Store(true)
		}
	}
}

// mattering lists the assumptions that matter so far, by index.
func (m *mapper) mattering() []int {
	var list []int
	for i := range m.matters {
		if m.matters[i].Load() {
			list = append(list, i)
		}
	}
	return list
}

func (m *mapper) outside(names ...string) *Zone {
	slices.Sort(names)
	names = slices.Compact(names)
	return m.zone("outside "+strings.Join(names, " "), &Zone{Outside: names})
}

// zone returns the one zone of a name.
func (m *mapper) zone(name string, made *Zone) *Zone {
	m.names.Lock()
	defer m.names.Unlock()
	if z := m.zones[name]; z != nil {
		return z
	}
	m.zones[name] = made
	return made
}

// steps is the number of cells of the net along each axis, before any of them is
// divided.
const steps = 48

// net is the grid from which everything starts: the case judged at its nodes.
type net [steps + 1][steps + 1]*spot // by column, then row

func (m *mapper) net() (*net, error) {
	n := new(net)
	const side = steps + 1
	err := m.each(side*side, func(i int) {
		n[i/side][i%side] = m.look(Point{float64(i/side) / steps, float64(i%side) / steps})
	})
	return n, err
}

// empty reports whether no node could be judged.
func (n *net) empty() bool {
	for _, column := range n {
		for _, s := range column {
			if s.zone.Class != nil {
				return false
			}
		}
	}
	return true
}

// web is a net as a tracer sees it, with the edges between its nodes.
type web struct {
	nodes  [steps + 1][steps + 1]node
	across [steps][steps + 1]*edge // from a node to the next column
	up     [steps + 1][steps]*edge // from a node to the next row
}

func (t *tracer) web(n *net) (*web, error) {
	w := new(web)
	for col := range n {
		for row := range n[col] {
			w.nodes[col][row] = t.read(n[col][row])
		}
	}
	err := t.each(edges, func(i int) { *w.edge(i) = t.netEdge(w, i, nil) })
	if err != nil {
		return nil, err
	}
	all := make([]int, edges)
	for i := range all {
		all[i] = i
	}
	t.spread(w, all)
	return w, nil
}

// edges is the number of edges of a net.
const edges = 2 * steps * (steps + 1)

// edge is an edge by its number: even ones lead across, odd ones up.
func (w *web) edge(i int) **edge {
	k, line := i/2/(steps+1), i/2%(steps+1)
	if i%2 == 0 {
		return &w.across[k][line]
	}
	return &w.up[line][k]
}

// netEdge follows an edge of the net. known are nodes on it that were met already.
func (t *tracer) netEdge(w *web, i int, known []node) *edge {
	k, line := i/2/(steps+1), i/2%(steps+1)
	at := func(k int) *node { return w.at(k, line) }
	if i%2 == 1 {
		at = func(k int) *node { return w.at(line, k) }
	}
	e := t.edge(at(k-1), at(k), at(k+1), at(k+2), known)
	e.ofNet, e.met = true, known
	return e
}

// at returns a node, nil beyond the web.
func (w *web) at(col, row int) *node {
	if col < 0 || row < 0 || col > steps || row > steps {
		return nil
	}
	return &w.nodes[col][row]
}

// each does a piece of work for every number below n, on all cores.
func (m *mapper) each(n int, work func(i int)) error {
	next := 0
	return InOrder(m.stop, runtime.GOMAXPROCS(0),
		func() (int, bool, error) { next++; return next - 1, next <= n, nil },
		func(i int) struct{} { work(i); return struct{}{} },
		func(struct{}) error { return nil })
}
