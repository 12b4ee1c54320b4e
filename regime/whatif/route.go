package whatif

import (
	"math"

	"regimed/regime"
	"regimed/regime/finding"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// route is the way along one input through its value in the case.
type route struct {
	place  input.Place
	along  course
	from   float64 // the value in the case, SI
	offset float64 // what a gauge pressure counts from; else 0
	unit   float64 // of an angle: up to which it is about linear; of a zero: the size of such a quantity in the case
}

// course says how an input is varied.
type course uint8

const (
	// by factors, up to a hundred either way: most inputs; a gauge pressure as
	// the absolute one that it stands for
	byFactor course = iota
	// an angle, within the rule of its field: evenly about zero, by factors far
	// from it
	byAngle
	// a zero: by factors from a millionth of what is natural in the case to a
	// hundred times that. It says nothing of still smaller values, but where the
	// class changes at the first step already: then it is asked whether it does so
	// at once.
	fromZero
	byOne // a whole number
)

const (
	mostDecades   = 2
	leastOfZero   = 1e-6
	evenAngle     = math.Pi / 180
	longestFactor = 0.125 * math.Ln10 // of one step, in ln x: an eighth of a decade
	longestZero   = 0.25 * math.Ln10  // from zero
	longestAngle  = 5 * math.Pi / 180
	fullTurn      = 2 * math.Pi
	wholeByOne    = 30 // whole numbers up to which every one is tried; beyond, every thirtieth of their size
)

// routesOf lists what is varied: the numbers that were given, in their order,
// and the tolerances of the measures that count.
func routesOf(c *input.Case, a *regime.Answer) []route {
	var list []route
	for _, p := range c.Places() {
		list = append(list, routeOf(c, a, p, c.At(p).Value))
	}
	for _, t := range []struct {
		name   string
		counts bool
		x      float64
	}{
		{"frequency", a.Interest.Has(finding.Frequency), a.Tolerance.Frequency},
		{"load", a.Interest.Has(finding.Load) || a.Interest.Has(finding.Sound), a.Tolerance.Load},
		{"response", a.Interest.Has(finding.Response), a.Tolerance.Response},
	} {
		p := input.Place{Field: c.Schema.Block("tolerance").Find(t.name)}
		if t.counts && !c.Has(p.Field) {
			list = append(list, routeOf(c, a, p, t.x))
		}
	}
	return list
}

func routeOf(c *input.Case, a *regime.Answer, p input.Place, x float64) route {
	r := route{place: p, from: x}
	switch q := c.At(p); {
	case p.Field.Type == input.Integer:
		r.along = byOne
	case p.Kind() == units.Angle:
		r.along, r.unit = byAngle, evenAngle
	case q != nil && q.Gauge:
		r.offset = c.X(c.Schema.Block("surroundings").Find("ambient_pressure"))
	case x == 0:
		r.along, r.unit = fromZero, zeroSize(c, a, p)
	}
	return r
}

// zeroSize is the size that a quantity of the kind of a zero has in the case: for
// the lower end of an interval its upper one, and else what its length, rate and
// density make, so that it does not depend on the system of units.
func zeroSize(c *input.Case, a *regime.Answer, p input.Place) float64 {
	if p.Field.Type == input.Interval && p.End == 0 {
		if high := c.Lookup(p.Field).Ends[1].Value; high > 0 {
			return high
		}
	}
	mass, length, time := p.Kind().Exponents()
	if size := natural(a.Scales, mass, length, time); size > 0 && !math.IsInf(size, 1) {
		return size
	}
	return 1
}

// natural is ρ^m L^(l + 3m) r^−t of the density ρ, the length L and the rate r of
// a case: the wet or dry frequency, or what a speed or the viscosity makes of the
// length.
func natural(s *scale.Set, mass, length, time int) float64 {
	l := firstOf(s.X(scale.Length), s.X(scale.Span), s.X(scale.Thickness))
	rate := firstOf(s.X(scale.FrequencyWet), s.X(scale.FrequencyDry), s.X(scale.FrequencyMotion), s.X(scale.Speed)/l, s.X(scale.SoundSpeed)/l,
		s.X(scale.KinematicViscosity)/(l*l))
	density := firstOf(s.X(scale.Density), s.X(scale.SolidDensity))
	size := 1.0
	for _, f := range []struct {
		x     float64
		power int
	}{{density, mass}, {l, length + 3*mass}, {rate, -time}} {
		if f.power != 0 {
			size *= math.Pow(f.x, float64(f.power))
		}
	}
	return size
}

// firstOf is the first of some numbers that is positive; NaN where none is.
func firstOf(list ...float64) float64 {
	for _, x := range list {
		if x > 0 {
			return x
		}
	}
	return math.NaN()
}

// tolerance reports whether the input is what the analyst accepts.
func (r *route) tolerance() bool { return r.place.Field.Of == "tolerance" }

// smooth reports whether the input has a logarithm by which to differentiate.
func (r *route) smooth() bool { return r.along != byOne && r.from+r.offset != 0 }

// near is the value e^by times that of the case.
func (r *route) near(by float64) float64 {
	if by == 0 {
		return r.from
	}
	return (r.from+r.offset)*math.Exp(by) - r.offset
}

// factor is a value over that of the case; NaN where that is zero. A gauge
// pressure counts as the absolute one.
func (r *route) factor(value float64) float64 {
	if r.from+r.offset == 0 {
		return math.NaN()
	}
	return (value + r.offset) / (r.from + r.offset)
}

// leg is a route in one direction. Places along it count from 0, the case, up;
// those on the other side of the case are negative.
type leg struct {
	*route
	up   bool
	sign float64 // +1 where the place on the route grows with the value
}

func (r *route) leg(up bool) *leg {
	l := &leg{r, up, 1}
	if !up {
		l.sign = -1
	}
	if r.along == byFactor && r.from+r.offset < 0 {
		l.sign = -l.sign
	}
	return l
}

// value of the input at a place.
func (l *leg) value(at float64) float64 {
	switch {
	case l.along == fromZero:
		return l.sign * l.unit * leastOfZero * math.Exp(at)
	case at == 0:
		return l.from
	case l.along == byAngle:
		return l.unit * math.Sinh(math.Asinh(l.from/l.unit)+l.sign*at)
	case l.along == byOne:
		return l.from + l.sign*at
	}
	return l.near(l.sign * at)
}

// beside is the place of the value e^by times that of the case.
func (l *leg) beside(by float64) float64 {
	if l.along == byAngle {
		return l.sign * (math.Asinh(l.near(by)/l.unit) - math.Asinh(l.from/l.unit))
	}
	return l.sign * by
}

// end is the last place.
func (l *leg) end() float64 {
	switch l.along {
	case byAngle:
		return l.sign * (math.Asinh(l.sign*fullTurn/l.unit) - math.Asinh(l.from/l.unit))
	case fromZero:
		return math.Log(math.Pow(10, mostDecades) / leastOfZero)
	case byOne:
		if l.up {
			return l.from * (math.Pow(10, mostDecades) - 1)
		}
		return l.from - math.Ceil(l.from/math.Pow(10, mostDecades))
	}
	return mostDecades * math.Ln10
}

// longest is the longest step from a place.
func (l *leg) longest(at float64) float64 {
	switch l.along {
	case byAngle:
		s := math.Asinh(l.from/l.unit) + l.sign*at
		return math.Min(longestFactor, longestAngle/(l.unit*math.Cosh(s)))
	case fromZero:
		return longestZero
	case byOne:
		return math.Max(1, math.Floor(math.Abs(l.value(at))/wholeByOne))
	}
	return longestFactor
}

// finest is the distance at which two places count as one.
func (l *leg) finest() float64 {
	if l.along == byOne {
		return 1
	}
	return rootTolerance
}
