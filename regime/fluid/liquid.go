package fluid

import "math"

// Pressure over which the typical liquids are taken as independent of it: a
// liquid of 1.5 GPa gains 0.7 % of density to 10 MPa.
const highestTypicalPressure = 10e6 // Pa

// liquid completes m to a liquid with typical values.
func (m Model) liquid(eval func(State) Properties) *Model {
	m.Phase = Liquid
	m.Typical = true
	m.limits = func(s State) (Interval, string) { return aboveVapour(eval(s)) }
	m.eval = eval
	m.Range.Pressure.Max = highestTypicalPressure
	return &m
}

// aboveVapour is where the liquid does not boil.
func aboveVapour(p Properties) (Interval, string) {
	if math.IsNaN(p.VapourPressure) {
		return Interval{0, math.Inf(1)}, ""
	}
	return Interval{p.VapourPressure, math.Inf(1)}, "the liquid boils below its vapour pressure"
}

// constantly is a liquid known at one state.
func constantly(p Properties) func(State) Properties {
	return func(State) Properties { return p }
}
