package fluid

import (
	"math"

	"regimed/regime/cite"
)

var steamGas = &gas{
	molarMass: 18.015268e-3, rotations: 3,
	vibrations:          []vibration{{1595, 1}, {3657, 1}, {3756, 1}},
	viscosity:           sutherland{1.12e-5, 350, 1064},
	conductivity:        conductivityDiluteWater,
	saturation:          saturationPressureSteam,
	criticalTemperature: criticalTemperatureWater, criticalPressure: 22.064e6, acentric: 0.345,
}

// steam is superheated.
var steam = steamGas.model(Model{
	Name: "steam", Title: "steam (superheated)",
	Default: State{Temperature: 423.15, Pressure: standardAtmosphere},
	Range:   Range{Temperature: Interval{373.15, 1000}, Pressure: Interval{Max: 2e6}},
	Sources: []*cite.Source{cite.WhiteViscous, cite.Shimanouchi1972, cite.IAPWSIF97, cite.IAPWSR1511},
	Note: "ideal gas: density within 1 % at one atmosphere and 5 % at the limits; viscosity within 3 %; refused above nine tenths of the " +
		"saturation pressure",
})

// saturationPressureSteam is that of water, without bound above the critical
// point, where nothing condenses.
func saturationPressureSteam(T float64) float64 {
	if T >= criticalTemperatureWater {
		return math.Inf(1)
	}
	return saturationPressureWater(T)
}
