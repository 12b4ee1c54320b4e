package fluid

import (
	"math"

	"regimed/regime/cite"
)

// The air of the US Standard Atmosphere 1976 has its own gas constant,
// R* = 8.31432 J/(mol·K) with M = 28.9644 g/mol; the molar mass here gives
// that same specific constant, 287.05307 J/(kg·K), with the present R*.
const (
	molarConstantUSSA = 8.31432    // J/(mol·K)
	molarMassUSSA     = 28.9644e-3 // kg/mol
	sutherlandBeta    = 1.458e-6   // kg/(m·s·√K)
	sutherlandAir     = 110.4      // K
	sutherlandAirAt   = 288.15     // K, where β is turned into a viscosity
	ratioAir          = 1.4        // heat capacity ratio
	conductivityAir   = 2.64638e-3 // W/(m·K·√K)
	conductivityAirT  = 245.4      // K
	conductivityAirE  = 12.0       // K
	pseudoCriticalT   = 132.2      // K, Smith, Van Ness and Abbott Table B.1
	pseudoCriticalP   = 3.745e6    // Pa
	pseudoAcentric    = 0.035      // of air
	lowestAir         = 170.0      // K
	highestAir        = 600.0      // K; above, γ = 1.4 is wrong by more than 2 %
	highestAirPress   = 3e6        // Pa; above, the viscosity grows with pressure by more than 3 %
)

var airGas = &gas{
	molarMass: molarMassUSSA * molarGasConstant / molarConstantUSSA,
	ratio:     ratioAir,
	viscosity: sutherland{
		viscosity:   sutherlandBeta * sutherlandAirAt * math.Sqrt(sutherlandAirAt) / (sutherlandAirAt + sutherlandAir),
		temperature: sutherlandAirAt,
		constant:    sutherlandAir,
	},
	conductivity:        thermalConductivityAir,
	criticalTemperature: pseudoCriticalT, criticalPressure: pseudoCriticalP, acentric: pseudoAcentric,
}

// air is dry.
var air = airGas.model(Model{
	Name: "air", Title: "air (dry)",
	Default: State{Temperature: 288.15, Pressure: standardAtmosphere},
	Range: Range{
		Temperature: Interval{lowestAir, highestAir},
		Pressure:    Interval{Max: highestAirPress},
	},
	Sources: []*cite.Source{cite.USSA1976},
	Note: "ideal gas with a heat capacity ratio of 1.4; near one atmosphere density within 0.1 %, sound speed within 0.3 % to 400 K and 1 % to 600 K, " +
		"viscosity within 2 %; humidity left out",
})

// thermalConductivityAir is that of the standard atmosphere.
//
//	k = 2.64638e-3 T^(3/2)/(T + 245.4·10^(−12/T))
//
// k in W/(m·K), T temperature in K. Range: 170 to 600 K here. Accuracy: 2 %.
// Check: 2.5326e-2 W/(m·K) at 288.15 K. Source: US Standard Atmosphere 1976
// Eq. 53 and table III, from memory.
func thermalConductivityAir(T float64) float64 {
	return conductivityAir * T * math.Sqrt(T) / (T + conductivityAirT*math.Pow(10, -conductivityAirE/T))
}
