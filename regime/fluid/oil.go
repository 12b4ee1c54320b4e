package fluid

import (
	"math"

	"regimed/regime/cite"
)

// oils are mineral oils of viscosity index near 100. The viscosity at 40 °C is
// the grade itself; that at 100 °C and the densities at 15 °C are typical.
var oils = []*Model{
	oil("oil-iso-vg-32", "mineral oil ISO VG 32", mineralOil{ν40: 32, ν100: 5.4, ρ15: 872}),
	oil("oil-iso-vg-46", "mineral oil ISO VG 46", mineralOil{ν40: 46, ν100: 6.8, ρ15: 877}),
	oil("oil-iso-vg-68", "mineral oil ISO VG 68", mineralOil{ν40: 68, ν100: 8.7, ρ15: 882}),
}

// mineralOil holds the data of a grade: ν in mm²/s, ρ in kg/m³.
type mineralOil struct{ ν40, ν100, ρ15 float64 }

// Typical of mineral oils.
const (
	expansionOil      = 6.5e-4 // 1/K, of the density at 15 °C
	soundSpeedOil40   = 1390.0 // m/s at 40 °C
	soundSpeedOilFall = 3.4    // m/s per K
	surfaceTensionOil = 0.030  // N/m
	oilCold, oilHot   = 10.0, 100.0
)

func oil(name, title string, o mineralOil) *Model {
	return Model{
		Name: name, Title: title, UsesTemperature: true,
		Default: State{Temperature: zeroCelsius + 40, Pressure: standardAtmosphere},
		Range: Range{
			Temperature: Interval{zeroCelsius + oilCold, zeroCelsius + oilHot},
			Pressure:    Interval{Min: 1e3},
		},
		Sources: []*cite.Source{cite.ISO3448, cite.ASTMD341, cite.TypicalLiquids},
		Note: "viscosity at 40 °C within the 10 % of the grade, away from it for a viscosity index near 100; density within 2 %, sound speed within 5 %; " +
			"the vapour pressure of the oil is negligible and not given: dissolved air comes out long before",
	}.liquid(o.at)
}

func (o mineralOil) at(s State) Properties {
	t := s.Temperature - zeroCelsius
	p := nothing()
	p.Density = o.ρ15 * (1 - expansionOil*(t-15))
	p.Viscosity = o.kinematic(s.Temperature) * p.Density
	p.SoundSpeed = soundSpeedOil40 - soundSpeedOilFall*(t-40)
	p.SurfaceTension = surfaceTensionOil
	return p
}

// kinematic is the kinematic viscosity in m²/s.
//
//	log₁₀ log₁₀(ν + 0.7) = a − b log₁₀ T
//
// ν in mm²/s, T temperature in K, a and b from the values at 40 and 100 °C.
// Range: 10 to 100 °C, ν above 2 mm²/s. Accuracy: 5 % for mineral oils,
// besides the 10 % of the grade. Check: the grade at 40 °C. Source: ASTM D341,
// from memory.
func (o mineralOil) kinematic(T float64) float64 {
	const T40, T100 = zeroCelsius + 40, zeroCelsius + 100
	w40, w100 := walther(o.ν40), walther(o.ν100)
	share := math.Log(T/T40) / math.Log(T100/T40)
	w := w40 + (w100-w40)*share
	return (math.Pow(10, math.Pow(10, w)) - 0.7) * 1e-6
}

func walther(ν float64) float64 { return math.Log10(math.Log10(ν + 0.7)) }
