package units

import (
	"slices"

	"gonum.org/v1/gonum/unit"
)

// Kind is the meaning of a quantity: what its dimension is, and what its
// dimension does not say. Values are append-only.
type Kind uint8

// The kinds of quantity.
const (
	Dimensionless Kind = iota
	Length
	Area
	Volume
	Mass
	Time
	Frequency // in cycles per second
	Speed
	Acceleration
	Density
	MassPerLength
	MassPerArea
	Inertia          // kg m², of a body
	InertiaPerLength // kg m, of a unit length of a body
	Force
	Pressure           // absolute
	GaugePressure      // above ambient
	PressureDifference // between two places
	Modulus            // of a material
	DynamicViscosity
	KinematicViscosity
	SurfaceTension
	Temperature // absolute
	Stiffness
	StiffnessPerLength
	RotationalStiffness
	BendingStiffnessBeam  // EI
	BendingStiffnessPlate // D
	Angle
	Damping // a pure number; which one, the DampingForm says
	Resistance
	Capacitance
	ForceFactor // of a moving coil, T m = N/A
	Salinity    // in g/kg
	ForcePerLength
	SpecificHeat
	ThermalConductivity

	kindCount
)

// kindInfo is what is known of a kind.
type kindInfo struct {
	name    string // "speed"
	phrase  string // "a speed": with its article, for sentences
	si      string // unit of Quantity.Value
	example string
	base    *unit.Unit // its dimension
}

var kindTable = [kindCount]kindInfo{
	Dimensionless:         {"dimensionless", "a pure number", "1", "0.05", dimensioned(unit.Dimensions{})},
	Length:                {"length", "a length", "m", "12.5 mm", mlt(0, 1, 0)},
	Area:                  {"area", "an area", "m2", "0.25 m2", mlt(0, 2, 0)},
	Volume:                {"volume", "a volume", "m3", "1.5 L", mlt(0, 3, 0)},
	Mass:                  {"mass", "a mass", "kg", "12 kg", mlt(1, 0, 0)},
	Time:                  {"time", "a time", "s", "8.5 s", mlt(0, 0, 1)},
	Frequency:             {"frequency", "a frequency", "Hz", "12 Hz", dimensioned(unit.Dimensions{unit.AngleDim: 1, unit.TimeDim: -1})},
	Speed:                 {"speed", "a speed", "m/s", "4.2 m/s", mlt(0, 1, -1)},
	Acceleration:          {"acceleration", "an acceleration", "m/s2", "9.81 m/s2", mlt(0, 1, -2)},
	Density:               {"density", "a density", "kg/m3", "7850 kg/m3", mlt(1, -3, 0)},
	MassPerLength:         {"mass per length", "a mass per length", "kg/m", "1.8 kg/m", mlt(1, -1, 0)},
	MassPerArea:           {"mass per area", "a mass per area", "kg/m2", "15 kg/m2", mlt(1, -2, 0)},
	Inertia:               {"moment of inertia", "a moment of inertia", "kg m2", "0.3 kg m2", mlt(1, 2, 0)},
	InertiaPerLength:      {"moment of inertia per length", "a moment of inertia per length", "kg m", "0.3 kg m2/m", mlt(1, 1, 0)},
	Force:                 {"force", "a force", "N", "2.5 kN", mlt(1, 1, -2)},
	Pressure:              {"absolute pressure", "an absolute pressure", "Pa", "1.013 bar", mlt(1, -1, -2)},
	GaugePressure:         {"gauge pressure", "a gauge pressure", "Pa", "3 barg", mlt(1, -1, -2)},
	PressureDifference:    {"pressure difference", "a pressure difference", "Pa", "20 kPa", mlt(1, -1, -2)},
	Modulus:               {"elastic modulus", "an elastic modulus", "Pa", "210 GPa", mlt(1, -1, -2)},
	DynamicViscosity:      {"dynamic viscosity", "a dynamic viscosity", "Pa s", "1.0 mPa s", mlt(1, -1, -1)},
	KinematicViscosity:    {"kinematic viscosity", "a kinematic viscosity", "m2/s", "1.0 mm2/s", mlt(0, 2, -1)},
	SurfaceTension:        {"surface tension", "a surface tension", "N/m", "72.8 mN/m", mlt(1, 0, -2)},
	Temperature:           {"temperature", "a temperature", "K", "20 degC", dimensioned(unit.Dimensions{unit.TemperatureDim: 1})},
	Stiffness:             {"stiffness", "a stiffness", "N/m", "250 kN/m", mlt(1, 0, -2)},
	StiffnessPerLength:    {"stiffness per length", "a stiffness per length", "N/m2", "40 kN/m2", mlt(1, -1, -2)},
	RotationalStiffness:   {"rotational stiffness", "a rotational stiffness", "N m/rad", "15 kN m/rad", mlt(1, 2, -2)},
	BendingStiffnessBeam:  {"bending stiffness of a beam", "a bending stiffness of a beam", "N m2", "3.2 kN m2", mlt(1, 3, -2)},
	BendingStiffnessPlate: {"bending stiffness of a plate", "a bending stiffness of a plate", "N m", "120 N m", mlt(1, 2, -2)},
	Angle:                 {"angle", "an angle", "rad", "30 deg", dimensioned(unit.Dimensions{unit.AngleDim: 1})},
	Damping:               {"damping", "a damping value", "1", "2 %", dimensioned(unit.Dimensions{})},
	Resistance:            {"electrical resistance", "an electrical resistance", "ohm", "6.5 ohm", current(1, 2, -3, -2)},
	Capacitance:           {"capacitance", "a capacitance", "F", "33 nF", current(-1, -2, 4, 2)},
	ForceFactor:           {"force factor", "a force factor", "T m", "7.2 T m", current(1, 1, -2, -1)},
	Salinity:              {"salinity", "a salinity", "g/kg", "35 g/kg", dimensioned(unit.Dimensions{})},
	ForcePerLength:        {"force per length", "a force per length", "N/m", "1.4 kN/m", mlt(1, 0, -2)},
	SpecificHeat:          {"specific heat", "a specific heat", "J/(kg K)", "4184 J/(kg K)", thermal(0, 2, -2)},
	ThermalConductivity:   {"thermal conductivity", "a thermal conductivity", "W/(m K)", "0.6 W/(m K)", thermal(1, 1, -3)},
}

// perRadian is the second dimension of a rotational stiffness: a moment per
// angle, where the angle is written out.
var perRadian = dimensioned(unit.Dimensions{unit.MassDim: 1, unit.LengthDim: 2, unit.TimeDim: -2, unit.AngleDim: -1})

// perSecond is the dimension of a rate that does not say what it counts.
var perSecond = mlt(0, 0, -1)

// dimensioned is one coherent SI unit of dimension d. Zero powers are left out,
// since gonum compares dimensions entry by entry.
func dimensioned(d unit.Dimensions) *unit.Unit { return unit.New(1, d) }

func mlt(mass, length, time int) *unit.Unit { return current(mass, length, time, 0) }

func current(mass, length, time, current int) *unit.Unit {
	return dimensioned(unit.Dimensions{unit.MassDim: mass, unit.LengthDim: length, unit.TimeDim: time, unit.CurrentDim: current})
}

func thermal(mass, length, time int) *unit.Unit {
	return dimensioned(unit.Dimensions{unit.MassDim: mass, unit.LengthDim: length, unit.TimeDim: time, unit.TemperatureDim: -1})
}

// noKind answers for values of Kind that don't exist.
var noKind = kindInfo{"unknown kind", "an unknown kind of quantity", "1", "1", dimensioned(unit.Dimensions{})}

func (k Kind) info() *kindInfo {
	if k >= kindCount {
		return &noKind
	}
	return &kindTable[k]
}

// String is the name of the kind: "length".
func (k Kind) String() string { return k.info().name }

// SI is the unit of [Quantity].Value: "m", "kg/m", "Pa s", "1".
func (k Kind) SI() string { return k.info().si }

// Example is a typical quantity of the kind: "4.2 m/s".
func (k Kind) Example() string { return k.info().example }

// Dimensions are those of gonum.org/v1/gonum/unit. A frequency has the
// dimension of angle per time, which is how it differs from a bare rate.
func (k Kind) Dimensions() unit.Dimensions { return k.info().base.Dimensions() }

// Exponents are the powers of mass, length and time in the dimension of the kind.
func (k Kind) Exponents() (mass, length, time int) {
	d := k.Dimensions()
	return d[unit.MassDim], d[unit.LengthDim], d[unit.TimeDim]
}

// Kinds lists all kinds in their order.
func Kinds() []Kind {
	all := make([]Kind, kindCount)
	for i := range all {
		all[i] = Kind(i)
	}
	return all
}

// bare says whether a number without a unit is a quantity of the kind. Salinity
// and angle are pure numbers too, but 35 and 0.035, or 30 and 0.52, are both
// common ways to write the same one.
func (k Kind) bare() bool { return k == Dimensionless || k == Damping }

// pressureKinds are those for which the words gauge and absolute mean something.
var pressureKinds = []Kind{Pressure, GaugePressure, PressureDifference}

// mark is a meaning that a unit symbol carries beside its dimension.
type mark uint8

const (
	plain    mark = iota
	gauge         // barg, psig
	absolute      // bara, psia
	saline        // psu, ppt: only a salinity reads them without doubt
)

// admits says whether the kind accepts units with the mark.
func (k Kind) admits(m mark) bool {
	switch m {
	case gauge:
		return slices.Contains(pressureKinds, k)
	case absolute:
		return k == Pressure
	case saline:
		return k == Salinity
	}
	return true
}

// matches says whether the dimension of u is one of the kind's.
func (k Kind) matches(u *unit.Unit) bool {
	if unit.DimensionsMatch(u, kindTable[k].base) {
		return true
	}
	return k == RotationalStiffness && unit.DimensionsMatch(u, perRadian)
}
