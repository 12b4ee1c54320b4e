package fluid

import "regimed/regime/cite"

var carbonDioxideGas = &gas{
	molarMass: 44.0095e-3, rotations: 2,
	vibrations:          []vibration{{667, 2}, {1333, 1}, {2349, 1}},
	viscosity:           sutherland{1.370e-5, 273, 222},
	criticalTemperature: 304.2, criticalPressure: 7.383e6, acentric: 0.224,
}

// carbonDioxide needs no saturation pressure: below the critical temperature
// the departure from the ideal gas reaches its limit at less than seven tenths
// of it.
var carbonDioxide = carbonDioxideGas.model(Model{
	Name: "carbon-dioxide", Title: "carbon dioxide (gas)",
	Range:   Range{Temperature: Interval{220, 1500}, Pressure: Interval{Max: 3e6}},
	Sources: []*cite.Source{cite.WhiteViscous, cite.Shimanouchi1972, cite.ChapmanCowling},
	Note: "ideal gas, refused where it departs from it by more than 5 % and so well below saturation; without the relaxation of the vibrations, " +
		"which stiffens it above some 10 kHz; viscosity within 2 %, Prandtl number within 6 %",
})
