package fluid

import (
	"math"

	"regimed/regime/cite"
)

// Phase is the state of aggregation.
type Phase uint8

// The phases; a fluid here is one or the other over its whole range.
const (
	Unknown Phase = iota
	Liquid
	Gas
)

// String names the phase.
func (p Phase) String() string {
	switch p {
	case Liquid:
		return "liquid"
	case Gas:
		return "gas"
	}
	return "unknown"
}

// State is where the properties are wanted.
type State struct {
	Temperature float64 // K, ITS-90
	Pressure    float64 // Pa, absolute
	Salinity    float64 // practical salinity, about g of salt per kg; 0 for all but seawater
}

// Properties are in SI units; NaN where the model does not give one.
type Properties struct {
	Density           float64 // kg/m³
	Viscosity         float64 // dynamic, Pa·s
	SoundSpeed        float64 // m/s, without dispersion
	VapourPressure    float64 // Pa, absolute, of a liquid at the temperature of the state
	SurfaceTension    float64 // N/m, against air or its own vapour
	HeatCapacityRatio float64 // isobaric by isochoric
	Prandtl           float64 // μ·c_p/k
	BulkModulus       float64 // isentropic, ρ·c², Pa
	Phase             Phase
}

// Model gives the properties of one fluid over a range.
type Model struct {
	Name    string // as a case names it
	Title   string
	Phase   Phase
	Typical bool // typical values, not a measured or standardised formulation

	// Which inputs change the values. A state is held to the whole range all
	// the same: values at 20 °C are not those at 80 °C.
	UsesTemperature, UsesPressure, UsesSalinity bool

	Default State // what is assumed where a case gives nothing
	Range   Range
	Sources []*cite.Source
	Note    string // accuracy and what is left out

	// limits narrows the range of pressure at a state, with the reason; nil
	// where the range alone holds.
	limits func(State) (Interval, string)
	eval   func(State) Properties
}

// At gives the properties at s, or a *RangeError where the model does not
// cover s: outside its range, or too near or beyond the change of phase.
func (m *Model) At(s State) (Properties, error) {
	if err := m.covers(s); err != nil {
		return Properties{}, err
	}
	p := m.eval(s)
	p.BulkModulus = p.Density * p.SoundSpeed * p.SoundSpeed
	p.Phase = m.Phase
	return p, nil
}

// PressureRange is the range of pressure that the model covers at the
// temperature and salinity of s, in Pa; it is narrower than Range.Pressure
// where the fluid boils, condenses or ceases to be an ideal gas.
func (m *Model) PressureRange(s State) Interval {
	allowed, _ := m.pressureRange(s)
	return allowed
}

// pressureRange also gives the reason why the range is narrowed.
func (m *Model) pressureRange(s State) (Interval, string) {
	if m.limits == nil {
		return m.Range.Pressure, ""
	}
	i, reason := m.limits(s)
	return Interval{math.Max(i.Min, m.Range.Pressure.Min), math.Min(i.Max, m.Range.Pressure.Max)}, reason
}

// covers returns an error rather than a *RangeError so that no nil pointer
// hides in the interface.
func (m *Model) covers(s State) error {
	if !m.Range.Temperature.Contains(s.Temperature) {
		return m.refuse(Temperature, s.Temperature, m.Range.Temperature, m.temperatureReason())
	}
	if !m.Range.Salinity.Contains(s.Salinity) {
		return m.refuse(Salinity, s.Salinity, m.Range.Salinity, m.salinityReason())
	}
	allowed, reason := m.pressureRange(s)
	if allowed.Contains(s.Pressure) {
		return nil
	}
	if m.Range.Pressure.Contains(s.Pressure) {
		return m.refuse(Pressure, s.Pressure, allowed, reason)
	}
	return m.refuse(Pressure, s.Pressure, allowed, givenRange)
}

// givenRange is the reason where no physics but the work behind the model
// sets the limit.
const givenRange = "the model is given for this range only"

func (m *Model) refuse(in Input, value float64, allowed Interval, reason string) error {
	return &RangeError{Fluid: m.Name, Input: in, Value: value, Min: allowed.Min, Max: allowed.Max, Reason: reason}
}

func (m *Model) temperatureReason() string {
	if m.UsesTemperature {
		return givenRange
	}
	return "the values are those of one temperature"
}

func (m *Model) salinityReason() string {
	if m.UsesSalinity {
		return givenRange
	}
	return "this fluid has no salinity; name seawater for salt water"
}

// nothing is the start of every evaluation: what is not set stays NaN.
func nothing() Properties {
	nan := math.NaN()
	return Properties{nan, nan, nan, nan, nan, nan, nan, nan, Unknown}
}
