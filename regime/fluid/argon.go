package fluid

import "regimed/regime/cite"

var argonGas = &gas{
	molarMass:           39.948e-3,
	viscosity:           sutherland{2.125e-5, 273, 114},
	criticalTemperature: 150.9, criticalPressure: 4.898e6,
}

// argon is above its critical temperature over the whole range.
var argon = argonGas.model(Model{
	Name: "argon", Title: "argon",
	Range:   Range{Temperature: Interval{170, 1500}, Pressure: Interval{Max: 3e6}},
	Sources: []*cite.Source{cite.WhiteViscous, cite.ChapmanCowling},
	Note:    "ideal gas, monatomic: near one atmosphere density and sound speed within 0.2 % at room temperature; viscosity within 2 %",
})
