package fluid

import (
	"math"

	"regimed/regime/cite"
)

const criticalTemperatureSodium = 2503.7 // K, Fink and Leibowitz 1995

// sodium is molten.
var sodium = Model{
	Name: "sodium", Title: "sodium (liquid)", UsesTemperature: true,
	Default: State{Temperature: 700, Pressure: standardAtmosphere},
	Range:   Range{Temperature: Interval{371, 1150}, Pressure: Interval{Min: 1}},
	Sources: []*cite.Source{cite.FinkLeibowitz1995},
	Note:    "recommended equations at saturation, taken to 10 MPa: density within 0.4 %, viscosity within 5 %, sound speed within 2 %",
}.liquid(sodiumAt)

// sodiumAt gives liquid sodium at saturation.
//
//	ρ = 219 + 275.32 (1 − T/T_c) + 511.58 (1 − T/T_c)^½
//	ln μ = −6.4406 − 0.3958 ln T + 556.835/T
//	c = 2660.7 − 0.37667 T − 9.0356e-5 T²
//	ln p_v = 11.9463 − 12633.73/T − 0.4672 ln T, p_v in MPa
//	σ = 0.2405 (1 − T/T_c)^1.126
//
// SI units but for p_v; T temperature in K, T_c = 2503.7 K. Range: 371 to
// 1150 K here. Accuracy: as in the note of the model. Check: 852 kg/m³,
// 2.64e-4 Pa·s and 2353 m/s at 700 K. Source: Fink and Leibowitz 1995, from
// memory.
func sodiumAt(s State) Properties {
	T := s.Temperature
	x := 1 - T/criticalTemperatureSodium
	p := nothing()
	p.Density = 219 + 275.32*x + 511.58*math.Sqrt(x)
	p.Viscosity = math.Exp(-6.4406 - 0.3958*math.Log(T) + 556.835/T)
	p.SoundSpeed = polynomial(T, 2660.7, -0.37667, -9.0356e-5)
	p.VapourPressure = 1e6 * math.Exp(11.9463-12633.73/T-0.4672*math.Log(T))
	p.SurfaceTension = 0.2405 * math.Pow(x, 1.126)
	return p
}
