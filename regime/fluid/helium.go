package fluid

import "regimed/regime/cite"

var heliumGas = &gas{
	molarMass:           4.002602e-3,
	viscosity:           sutherland{1.865e-5, 273, 79.4},
	criticalTemperature: 10.47, criticalPressure: 0.676e6,
}

// helium is above its critical temperature over the whole range.
var helium = heliumGas.model(Model{
	Name: "helium", Title: "helium",
	Range:   Range{Temperature: Interval{230, 700}, Pressure: Interval{Max: 5e6}},
	Sources: []*cite.Source{cite.KayeLaby, cite.ChapmanCowling},
	Note:    "ideal gas, monatomic: density and sound speed within 0.1 % near one atmosphere; viscosity within 3 %",
})
