package kind

import (
	"fmt"
	"math"

	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// neighbour is where another cylinder of about the same diameter stands, in
// diameters along and across the flow; NaN without one.
type neighbour struct{ along, across float64 }

var arrangements = map[string]float64{"tandem": 0, "side-by-side": math.Pi / 2}

// neighbour reads the neighbour of a body of diameter d in a flow across it.
func (r *Resolver) neighbour(d float64) neighbour {
	none := neighbour{math.NaN(), math.NaN()}
	if !r.c.Has(NeighbourDistance) {
		for _, f := range []*input.Field{NeighbourPlace, NeighbourAngle} {
			if r.c.Has(f) {
				r.violations.Add(NeighbourDistance.Pointer(), input.MissingField, "A neighbour needs the distance between the axes.", nil)
				return none
			}
		}
		return none
	}
	s := r.c.X(NeighbourDistance)
	r.take(scale.NeighbourSpacing, NeighbourDistance)
	if s <= d {
		r.contradict(NeighbourDistance, "The axes lie no further apart than a diameter: the cylinders overlap.")
		return none
	}
	place, angle := r.c.Choice(NeighbourPlace, ""), r.c.X(NeighbourAngle)
	fixed, named := arrangements[place]
	switch {
	case named && !math.IsNaN(angle) && math.Abs(angle-fixed) > 0.1:
		r.contradict(NeighbourAngle, fmt.Sprintf("A neighbour %s stands at %s to the flow, not at %s.", place, units.Format(fixed, units.Angle), units.Format(angle, units.Angle)))
		return none
	case named && math.IsNaN(angle):
		angle = fixed
	case math.IsNaN(angle) && place == "staggered":
		r.violations.Add(NeighbourAngle.Pointer(), input.MissingField, "A staggered neighbour needs its angle to the flow.", nil)
		return none
	case math.IsNaN(angle):
		angle = 0
		r.warn(NeighbourPlace, "assumed", "The neighbour is taken to stand in tandem, which reaches furthest.")
	}
	sin, cos := math.Sincos(angle)
	if place == "side-by-side" && !r.c.Has(NeighbourAngle) {
		sin, cos = 1, 0
	}
	r.trait(group.Neighboured)
	return neighbour{s / d * cos, s / d * sin}
}

func (n neighbour) groups(g *group.Set) {
	if g.Is(group.Neighboured) {
		g.Put(group.NeighbourAlong, n.along)
		g.Put(group.NeighbourAcross, n.across)
	}
}
