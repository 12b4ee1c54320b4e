package whatif

import (
	"math"
	"slices"

	"regimed/regime"
)

// turn finds the nearest value, above or below that of the case, beyond which
// another class is recommended.
//
// It walks out in ln x, in steps of an eighth of a decade at most, over two
// decades, and compares classes. It ends where the input breaks its rule,
// contradicts the rest of the case, leaves the range of a property, or becomes
// implausible where the case is not; the edge is approached by halving. Each step
// is shortened to where the watched parts, drawn out as power laws, say that the
// class changes: a narrow band is then hit rather than jumped. Where steps do not
// fit together, so that a peak, a dip or a jump between them could change the
// class, it looks there too. A class that comes and goes within a step and leaves
// no trace on either side of it is passed over.
//
// The turning point is known to 1e-10 of ln x, and what is reported lies beyond it.
func (w *walker) turn(up bool) (regime.Turn, bool) {
	p := &path{walker: w, leg: w.route.leg(up)}
	p.limit = p.leg.end()
	for p.begin(); !p.done(); {
		p.step()
	}
	return p.result, p.found
}

// path is what a walk along a leg has seen: the last four views.
type path struct {
	*walker
	leg     *leg
	trail   []*view
	limit   float64 // no place beyond it is looked at
	shut    bool    // whether the case is closed at the limit
	short   int     // steps in a row that were shortened
	found   bool
	result  regime.Turn
	nearest *view // of the class of the case, next to the change that was found
}

// begin sets out from the case, with the view on the other side of it for the
// first slope.
func (p *path) begin() {
	if p.leg.along == fromZero {
		p.fromZero()
		return
	}
	if before := p.next(!p.leg.up); before != nil {
		p.trail = append(p.trail, before)
	}
	p.trail = append(p.trail, p.base)
	if ahead := p.next(p.leg.up); ahead != nil {
		p.take(ahead)
	}
}

// fromZero takes the first step from a zero. Where the class is another one
// there already, and a millionth of the way there too, it changes at once.
func (p *path) fromZero() {
	first := p.look(p.leg, 0)
	p.trail = append(p.trail, first)
	switch {
	case !first.open:
		p.limit = 0
	case first.class != p.base.class:
		nearer := p.look(p.leg, math.Log(leastOfZero))
		if nearer.open && nearer.class == p.base.class {
			p.settle(nearer, first)
			return
		}
		p.record(0, p.base, first)
	}
}

// next is the view next to the case, above it or below, that the sensitivities
// were taken from; nil where there is none.
func (p *path) next(up bool) *view {
	i, by := 0, -driverStep
	if up == (p.route.from+p.route.offset > 0) {
		i, by = 1, driverStep
	}
	v := p.beside[i]
	if v != nil {
		v.at = p.leg.beside(by)
	}
	return v
}

func (p *path) done() bool {
	if p.found || p.ctx.Err() != nil {
		return true
	}
	left := p.limit - p.last().at
	if p.leg.along == byOne {
		return left < 1 || p.shut && left <= 1
	}
	return left <= rootTolerance || p.shut && left <= edgeTolerance
}

// edgeTolerance is how near the walk comes to an edge of the range of an input.
const edgeTolerance = 1e-6

func (p *path) last() *view { return p.trail[len(p.trail)-1] }

// step looks at one more place.
func (p *path) step() {
	at := p.target()
	v := p.look(p.leg, at)
	if !v.open {
		p.limit, p.shut = at, true
		return
	}
	p.take(v)
}

// target is the next place to look at.
func (p *path) target() float64 {
	last := p.last()
	longest := math.Min(p.leg.longest(last.at), p.limit-last.at)
	if p.shut {
		longest = math.Min(longest, (p.limit-last.at)/2)
	}
	if p.leg.along == byOne {
		return last.at + math.Max(1, math.Floor(longest))
	}
	if d := p.expected(longest); d < longest {
		p.short++
		return last.at + d + math.Min(math.Ldexp(rootTolerance, 3*p.short-4), longest-d)
	}
	p.short = 0
	return last.at + longest
}

// take adds a view, and settles where the class has changed on the way to it.
func (p *path) take(v *view) {
	p.trail = append(p.trail, v)
	n := len(p.trail)
	if n >= 4 {
		if same, other := p.between([4]*view(p.trail[n-4:])); other != nil {
			p.settle(same, other)
			return
		}
		p.trail = slices.Delete(p.trail, 0, n-3)
		n = 3
	}
	if v.class == p.base.class || !p.settle(p.trail[n-2], v) || n < 3 {
		return
	}
	// Another change may hide on the way to the one that was found.
	if same, other := p.between([4]*view{p.trail[n-3], p.trail[n-2], p.nearest, v}); other != nil {
		p.settle(same, other)
	}
}

// expected is the distance from the last view at which the watched parts, drawn
// out as power laws, make another class; +Inf where they do not within reach.
func (p *path) expected(reach float64) float64 {
	n := len(p.trail)
	if n < 2 {
		return math.Inf(1)
	}
	a, b := p.trail[n-2], p.trail[n-1]
	span := b.at - a.at
	p.guess = append(p.guess[:0], b.excess...)
	var places [8]float64
	crossings := places[:0]
	for i, g := range b.excess {
		rate := (g - a.excess[i]) / span
		if d := -g / rate; d > 0 && d < reach && len(crossings) < cap(crossings) {
			crossings = append(crossings, d)
		}
	}
	slices.Sort(crossings)
	for _, d := range crossings {
		for i, g := range b.excess {
			if rate := (g - a.excess[i]) / span; !math.IsNaN(rate) {
				p.guess[i] = g + rate*(d*(1+1e-9)+1e-12)
			}
		}
		if !p.watch.same(p.guess) {
			return d
		}
	}
	return math.Inf(1)
}

// settle closes in on the change of class between two views, and records it. A
// place that is closed ends the walk before it, which then goes on from the
// nearest view of the same class.
func (p *path) settle(same, other *view) bool {
	b := p.bracketOf(same, other)
	for b.high-b.low > p.leg.finest() {
		if p.ctx.Err() != nil {
			return false
		}
		at := b.next()
		if p.leg.along == byOne {
			at = math.Floor(b.low + (b.high-b.low)/2)
		}
		v := p.look(p.leg, at)
		switch {
		case !v.open:
			p.trail, p.limit, p.shut = append(p.trail[:0], same), at, true
			return false
		case v.class == p.base.class:
			same = v
			b.lower(at, p.signed(same, other, same))
			b.atHigh = p.signed(same, other, other)
		default:
			other = v
			b.upper(at, p.signed(same, other, other))
			b.atLow = p.signed(same, other, same)
		}
	}
	p.record(p.leg.value(other.at), same, other)
	return true
}

func (p *path) bracketOf(same, other *view) *bracket {
	return newBracket(same.at, other.at, p.signed(same, other, same), p.signed(same, other, other))
}

// signed is the largest excess, at one of two views, of the finding that turns
// between them; NaN where none does.
func (p *path) signed(same, other, at *view) float64 {
	if i := p.turned(same, other); i >= 0 {
		return p.watch.entries[i].worst(at.excess)
	}
	return math.NaN()
}

// turned is the index of the watched finding that turns between two views: one
// that rules the class of the case out, or no longer rules out a cheaper one. −1:
// none does, for the domain of the classes changes.
func (p *path) turned(same, other *view) int {
	last := &p.watch.classes[len(p.watch.classes)-1]
	if !last.class.Domain.Covers(p.kase.Kind, other.traits) {
		return -1
	}
	for _, i := range last.on {
		if other.judged[i].out && !same.judged[i].out {
			return i
		}
	}
	for _, c := range p.watch.classes {
		if c.class != other.class {
			continue
		}
		for _, i := range c.on {
			if same.judged[i].out && !other.judged[i].out {
				return i
			}
		}
	}
	return -1
}

func (p *path) record(value float64, same, other *view) {
	p.found, p.nearest = true, same
	p.result = regime.Turn{Place: p.route.place, Up: p.leg.up, Value: value, Factor: p.route.factor(value), Class: other.class}
	if i := p.turned(same, other); i >= 0 {
		p.result.Entry, p.result.Verdict = p.watch.entries[i].entry, other.judged[i].verdict
	}
}
