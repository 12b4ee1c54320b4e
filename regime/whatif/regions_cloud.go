package whatif

import "regimed/regime/input"

// Cloud is where the case may stand, if one of the two inputs is uncertain or both
// are.
type Cloud struct {
	Points []Point // draws that lie on the map
	Draws  int     // all draws
	// The 5 and 95 % of each input; the same twice where it is certain. They may
	// lie beyond the map. Low and High are their positions, Quantiles the inputs, x
	// before y, in SI.
	Low, High Point
	Quantiles [2][2]float64
}

// draws is the number of points of a cloud.
const draws = 200

// cloudOf draws from the uncertainty of the two inputs, quasi-randomly and from a
// seed that their pointers make, so that a case has the same cloud in any units.
func cloudOf(c *input.Case, x, y MapAxis) *Cloud {
	if c.At(x.Place) == nil || c.At(y.Place) == nil {
		return nil
	}
	var d drawing
	for _, p := range Uncertain(c) {
		if p == x.Place || p == y.Place {
			d.inputs, d.given = append(d.inputs, p), append(d.given, *c.At(p))
			d.seed += p.Pointer() + "\n"
		}
	}
	if len(d.inputs) == 0 {
		return nil
	}
	values := func(row []float64) [2]float64 {
		v := [2]float64{c.At(x.Place).Value, c.At(y.Place).Value}
		for i, place := range d.inputs {
			if place == x.Place {
				v[0] = valueAt(d.given[i], row[i])
			} else {
				v[1] = valueAt(d.given[i], row[i])
			}
		}
		return v
	}
	at := func(v [2]float64) Point { return Point{x.Position(v[0]), y.Position(v[1])} }
	cloud := &Cloud{Draws: draws, Quantiles: [2][2]float64{values([]float64{0.05, 0.05}), values([]float64{0.95, 0.95})}}
	cloud.Low, cloud.High = at(cloud.Quantiles[0]), at(cloud.Quantiles[1])
	for _, row := range d.points(0, draws) {
		if p := at(values(row)); within(p.X) && within(p.Y) {
			cloud.Points = append(cloud.Points, p)
		}
	}
	return cloud
}
