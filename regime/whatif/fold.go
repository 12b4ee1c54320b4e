package whatif

import "math"

// mostHidden is how many places are looked at between two views, beyond which
// what may still hide there is let be.
const mostHidden = 8

// between looks for a change of class between the second and the third of four
// views, all of the class of the case but perhaps the last. It returns the view
// in which the class has changed and the one before it; nil where none has.
func (p *path) between(four [4]*view) (same, other *view) {
	if p.leg.along == byOne {
		return nil, nil
	}
	left := mostHidden
	return p.search(&four, &left)
}

func (p *path) search(four *[4]*view, left *int) (same, other *view) {
	at := p.suspect(four)
	if *left == 0 || math.IsNaN(at) {
		return nil, nil
	}
	*left--
	v := p.look(p.leg, at)
	switch {
	case !v.open:
		return nil, nil
	case v.class != p.base.class:
		return four[1], v
	}
	if same, other := p.search(&[4]*view{four[0], four[1], v, four[2]}, left); other != nil {
		return same, other
	}
	return p.search(&[4]*view{four[1], v, four[2], four[3]}, left)
}

// suspect is a place between the second and the third view at which the watched
// parts could make another class, though by neither view they do; NaN: there is
// none.
func (p *path) suspect(four *[4]*view) float64 {
	b, c := four[1], four[2]
	span := c.at - b.at
	if span <= finestGap {
		return math.NaN()
	}
	p.places = p.places[:0]
	suspected := false
	for i := range b.excess {
		f := fold{span: span, f: b.excess[i], g: c.excess[i], left: slope(four[0], b, i), right: slope(c, four[3], i),
			before: b.at - four[0].at, after: four[3].at - c.at}
		t := f.place()
		if t < finestGap/2 || t > span-finestGap/2 { // as good as one of the views
			t = math.NaN()
		}
		suspected = suspected || !math.IsNaN(t)
		p.places = append(p.places, t)
	}
	if !suspected {
		return math.NaN()
	}
	for i, t := range p.places {
		if !math.IsNaN(t) && p.matters(b, c, i, t/span) {
			return b.at + t
		}
	}
	return math.NaN()
}

// slope of a watched part between two views; NaN where they are too near to each
// other to tell.
func slope(a, b *view, i int) float64 {
	if b.at-a.at < edgeTolerance {
		return math.NaN()
	}
	return (b.excess[i] - a.excess[i]) / (b.at - a.at)
}

// matters reports whether the class could change between two views, at a share
// of the way, were one part, or every part that is suspect, beyond its limit or
// within.
func (p *path) matters(b, c *view, part int, share float64) bool {
	for _, alone := range []bool{true, false} {
		for _, extreme := range []float64{1, -1} {
			p.guess = p.guess[:0]
			for j := range b.excess {
				g := b.excess[j] + (c.excess[j]-b.excess[j])*share
				if j == part || !alone && !math.IsNaN(p.places[j]) {
					g = extreme
				}
				p.guess = append(p.guess, g)
			}
			if !p.watch.same(p.guess) {
				return true
			}
		}
	}
	return false
}

// finestGap is the distance in ln x between two views below which nothing is
// looked for between them.
const finestGap = 0.005

// fold is what is known of a watched part between two views a span apart: its
// excesses there, and the slopes outside of them, taken over the distances before
// and after.
type fold struct {
	span, f, g, left, right, before, after float64
}

// place says where, from the first view on, the part may pass its limit and come
// back between the two. NaN: nothing speaks for that.
//
// Between two views a power law is a line, and the worst of several is a line with
// a bend. Lines that meet between the views show a peak or a dip at once. A slope
// so steep that its pole, or its zero, lies between them shows a resonance, or an
// error that passes through zero. Where neither holds and the lines do not fit,
// something jumps or several bends follow each other, and the middle is asked.
func (f fold) place() float64 {
	if math.IsNaN(f.f) != math.IsNaN(f.g) {
		return f.span / 2 // the part is made on one side only
	}
	f.supply()
	if f.fits() || (f.f > 0) != (f.g > 0) {
		return math.NaN()
	}
	if t, between := f.meeting(); between {
		if f.reaches() || f.passes(f.f+f.left*t) {
			return t
		}
		return f.singular()
	}
	if t := f.singular(); !math.IsNaN(t) {
		return t
	}
	if f.reaches() || math.Max(math.Abs(f.f), math.Abs(f.g)) < nearLimit {
		return f.span / 2
	}
	return math.NaN()
}

// middle is the slope between the views.
func (f *fold) middle() float64 { return (f.g - f.f) / f.span }

// supply puts the slope between the views for one that is not known.
func (f *fold) supply() {
	if math.IsNaN(f.left) {
		f.left = f.middle()
	}
	if math.IsNaN(f.right) {
		f.right = f.middle()
	}
}

// fits reports whether the lines of both sides are one, as of a power law.
func (f *fold) fits() bool {
	return !(math.Abs(f.right-f.left)*f.span > leastBend || math.Abs(f.middle()-f.left)*f.span > leastBend)
}

// meeting is where the lines of both sides meet, and whether that is between the
// views.
func (f *fold) meeting() (t float64, between bool) {
	t = (f.g - f.f - f.right*f.span) / (f.left - f.right)
	return t, t > 0 && t < f.span
}

// passes reports whether an excess between the views lies beyond the limit that
// those at the views keep to, or nearly.
func (f *fold) passes(g float64) bool {
	if f.f > 0 {
		return g < nearPeak
	}
	return g > -nearPeak
}

// reaches reports whether the steepest of the slopes, or a proportion, could lead
// from both views to the limit.
func (f *fold) reaches() bool {
	steepest := math.Max(math.Max(1, math.Abs(f.middle())), math.Max(math.Abs(f.left), math.Abs(f.right)))
	return math.Abs(f.f)+math.Abs(f.g) < steepest*f.span
}

const (
	nearLimit = 1    // how near the limit on both sides a part lies that may jump over it
	leastBend = 0.03 // difference of the lines below which they fit
	nearPeak  = 0.02 // how near a peak may come to its limit and count as beyond, since lines are no curves
)

// singular is the place of a pole or a zero between the views, the nearer by the
// slopes: near it the excess is ∓ln|t − t₀|, which changes by ln(1 + h/d) over a
// distance h that ends d before t₀.
func (f fold) singular() float64 {
	sign := 1.0
	if f.f > 0 { // a zero is looked for
		sign = -1
	}
	left, right := f.before/math.Expm1(sign*f.left*f.before), f.after/math.Expm1(-sign*f.right*f.after)
	fromLeft, fromRight := left > 0 && left < f.span, right > 0 && right < f.span
	switch {
	case fromLeft && (!fromRight || left < right):
		return left
	case fromRight:
		return f.span - right
	}
	return math.NaN()
}
