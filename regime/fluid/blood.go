package fluid

import (
	"math"

	"regimed/regime/cite"
)

// blood is whole human blood at body temperature.
var blood = Model{
	Name: "blood", Title: "blood (whole, 37 °C, sheared fast)",
	Default: State{Temperature: 310.15, Pressure: standardAtmosphere},
	Range:   Range{Temperature: Interval{308.15, 313.15}, Pressure: Interval{Min: 1e3}},
	Sources: []*cite.Source{cite.FungCirculation, cite.KayeLaby, cite.TypicalLiquids},
	Note: "Newtonian value for shear rates above about 100 1/s and a haematocrit of 0.45; slower shear makes it thicker, by a factor of ten at 0.1 1/s; " +
		"at 37 °C, taken for 35 to 40 °C",
}.liquid(constantly(Properties{
	Density:           1060,
	Viscosity:         3.5e-3,
	SoundSpeed:        1575,
	VapourPressure:    6.28e3, // that of water at 37 °C
	SurfaceTension:    0.056,
	HeatCapacityRatio: math.NaN(), Prandtl: math.NaN(),
}))
