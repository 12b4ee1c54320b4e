package fluid

import "regimed/regime/cite"

var nitrogenGas = &gas{
	molarMass: 28.0134e-3, rotations: 2,
	vibrations:          []vibration{{2330, 1}},
	viscosity:           sutherland{1.663e-5, 273, 107},
	criticalTemperature: 126.2, criticalPressure: 3.400e6, acentric: 0.038,
}

// nitrogen is above its critical temperature over the whole range.
var nitrogen = nitrogenGas.model(Model{
	Name: "nitrogen", Title: "nitrogen",
	Range:   Range{Temperature: Interval{150, 1500}, Pressure: Interval{Max: 3e6}},
	Sources: []*cite.Source{cite.WhiteViscous, cite.Shimanouchi1972, cite.ChapmanCowling},
	Note:    "ideal gas: near one atmosphere density and sound speed within 0.3 % at room temperature; viscosity within 2 %, Prandtl number within 6 %",
})
