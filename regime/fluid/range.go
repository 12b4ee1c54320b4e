package fluid

import "fmt"

// Interval is closed on both sides.
type Interval struct{ Min, Max float64 }

// Contains is false for NaN.
func (i Interval) Contains(x float64) bool { return x >= i.Min && x <= i.Max }

// Range is what a model covers, in K, Pa (absolute) and practical salinity.
type Range struct{ Temperature, Pressure, Salinity Interval }

// Input names a part of the state.
type Input string

// The inputs of a model.
const (
	Temperature Input = "temperature"
	Pressure    Input = "pressure"
	Salinity    Input = "salinity"
)

// Unit is the unit in which the input is held.
func (in Input) Unit() string {
	switch in {
	case Temperature:
		return "K"
	case Pressure:
		return "Pa"
	}
	return "g/kg"
}

// RangeError says which input of a state the model refuses, and why.
type RangeError struct {
	Fluid    string
	Input    Input
	Value    float64 // in the unit of the input
	Min, Max float64 // what would be accepted, the rest of the state unchanged
	Reason   string
}

// Error is one sentence without full stop.
func (e *RangeError) Error() string {
	u := e.Input.Unit()
	return fmt.Sprintf("%s: %s %.7g %s is outside %.7g %s to %.7g %s: %s",
		e.Fluid, e.Input, e.Value, u, e.Min, u, e.Max, u, e.Reason)
}
