package fluid

import "regimed/regime/cite"

var methaneGas = &gas{
	molarMass: 16.0425e-3, rotations: 3,
	vibrations:          []vibration{{2917, 1}, {1534, 2}, {3019, 3}, {1306, 3}},
	viscosity:           sutherland{1.026e-5, 273, 198},
	criticalTemperature: 190.6, criticalPressure: 4.599e6, acentric: 0.012,
}

// methane is above its critical temperature over the whole range.
var methane = methaneGas.model(Model{
	Name: "methane", Title: "methane",
	Range:   Range{Temperature: Interval{200, 600}, Pressure: Interval{Max: 3e6}},
	Sources: []*cite.Source{cite.KayeLaby, cite.Shimanouchi1972, cite.ChapmanCowling},
	Note:    "ideal gas: near one atmosphere density and sound speed within 0.5 % at room temperature; viscosity within 2 %, Prandtl number within 6 %",
})
