package fluid

import (
	"math"

	"regimed/regime/cite"
)

// glycol is ethylene glycol and water, half and half by mass, at 20 °C.
var glycol = Model{
	Name: "glycol-50", Title: "ethylene glycol 50 % by mass in water, 20 °C",
	Default: State{Temperature: 293.15, Pressure: standardAtmosphere},
	Range:   Range{Temperature: Interval{291.15, 295.15}, Pressure: Interval{Min: 1e3}},
	Sources: []*cite.Source{cite.CRCHandbook, cite.TypicalLiquids},
	Note:    "at 20 °C, taken for 18 to 22 °C, where the viscosity changes by some 6 %; density within 1 %, viscosity and sound speed within 5 %; without inhibitors",
}.liquid(constantly(Properties{
	Density:           1064,
	Viscosity:         3.95e-3,
	SoundSpeed:        1660,
	VapourPressure:    1.8e3, // Raoult: mole fraction of water 0.775
	SurfaceTension:    0.057,
	HeatCapacityRatio: math.NaN(), Prandtl: math.NaN(),
}))
