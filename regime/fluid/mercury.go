package fluid

import (
	"math"

	"regimed/regime/cite"
)

// mercury is at room temperature.
var mercury = Model{
	Name: "mercury", Title: "mercury, 20 °C",
	Default: State{Temperature: 293.15, Pressure: standardAtmosphere},
	Range:   Range{Temperature: Interval{283.15, 303.15}, Pressure: Interval{Min: 1}},
	Sources: []*cite.Source{cite.CRCHandbook, cite.KayeLaby, cite.TypicalLiquids},
	Note:    "at 20 °C, taken for 10 to 30 °C: density changes by 0.2 %, sound speed by 0.4 %, viscosity by 4 %; the vapour pressure is that at 20 °C, and doubles in 10 K",
}.liquid(constantly(Properties{
	Density:           13546,
	Viscosity:         1.554e-3,
	SoundSpeed:        1451,
	VapourPressure:    0.17,
	SurfaceTension:    0.4855,
	HeatCapacityRatio: math.NaN(), Prandtl: math.NaN(),
}))
