package fluid

import "regimed/regime/cite"

var hydrogenGas = &gas{
	molarMass: 2.01588e-3, rotations: 2,
	vibrations:          []vibration{{4161, 1}},
	viscosity:           sutherland{8.411e-6, 273, 97},
	criticalTemperature: 43.6, criticalPressure: 2.05e6,
}

// hydrogen is above its critical temperature over the whole range.
var hydrogen = hydrogenGas.model(Model{
	Name: "hydrogen", Title: "hydrogen",
	Range:   Range{Temperature: Interval{250, 1000}, Pressure: Interval{Max: 5e6}},
	Sources: []*cite.Source{cite.WhiteViscous, cite.Shimanouchi1972, cite.ChapmanCowling},
	Note: "ideal gas with classical rotation: sound speed 0.2 % low at 300 K and 0.6 % low at 250 K; viscosity within 2 %, " +
		"Prandtl number within 6 %",
})
