package units

import (
	"math"
	"strconv"
)

// step is a unit in which a kind is written from a certain size on.
type step struct {
	from   float64 // least size in SI for which the step is used
	scale  float64 // SI value of one unit
	symbol string
}

// ladders are the units in which the trade writes each kind, largest first. The
// last step also takes what is smaller.
var ladders = [kindCount][]step{
	Dimensionless: {{0, 1, ""}},
	Damping:       {{0, 1, ""}},
	Length:        {{1e4, 1e3, "km"}, {1, 1, "m"}, {1e-3, 1e-3, "mm"}, {1e-6, 1e-6, "µm"}, {0, 1e-9, "nm"}},
	Area:          {{0.01, 1, "m²"}, {0, 1e-6, "mm²"}},
	Volume:        {{1, 1, "m³"}, {1e-3, 1e-3, "L"}, {1e-6, 1e-6, "cm³"}, {0, 1e-9, "mm³"}},
	Mass:          {{1e4, 1e3, "t"}, {1, 1, "kg"}, {1e-3, 1e-3, "g"}, {1e-6, 1e-6, "mg"}, {0, 1e-9, "µg"}},
	Time:          {{36000, 3600, "h"}, {1, 1, "s"}, {1e-3, 1e-3, "ms"}, {1e-6, 1e-6, "µs"}, {0, 1e-9, "ns"}},
	Frequency:     {{1e9, 1e9, "GHz"}, {1e6, 1e6, "MHz"}, {1e3, 1e3, "kHz"}, {1e-2, 1, "Hz"}, {0, 1e-3, "mHz"}},
	Speed:         {{0.01, 1, "m/s"}, {1e-5, 1e-3, "mm/s"}, {0, 1e-6, "µm/s"}},
	Acceleration:  {{0, 1, "m/s²"}},
	Density:       {{0, 1, "kg/m³"}},
	MassPerLength: {{1e4, 1e3, "t/m"}, {0.1, 1, "kg/m"}, {1e-4, 1e-3, "g/m"}, {0, 1e-6, "mg/m"}},
	MassPerArea:   {{1e4, 1e3, "t/m²"}, {0.1, 1, "kg/m²"}, {0, 1e-3, "g/m²"}},

	Inertia:          {{0, 1, "kg m²"}},
	InertiaPerLength: {{0, 1, "kg m"}},
	Force:            {{1e6, 1e6, "MN"}, {1e3, 1e3, "kN"}, {1, 1, "N"}, {1e-3, 1e-3, "mN"}, {1e-6, 1e-6, "µN"}, {0, 1e-9, "nN"}},

	Pressure:           pressures,
	GaugePressure:      pressures,
	PressureDifference: pressures,
	Modulus:            pressures,
	DynamicViscosity:   {{1, 1, "Pa s"}, {1e-4, 1e-3, "mPa s"}, {0, 1e-6, "µPa s"}},
	KinematicViscosity: {{0.1, 1, "m²/s"}, {0, 1e-6, "mm²/s"}},
	SurfaceTension:     {{1, 1, "N/m"}, {0, 1e-3, "mN/m"}},
	Temperature:        {{0, 1, "K"}},

	Stiffness:             {{1e9, 1e9, "GN/m"}, {1e6, 1e6, "MN/m"}, {1e3, 1e3, "kN/m"}, {1, 1, "N/m"}, {0, 1e-3, "mN/m"}},
	StiffnessPerLength:    {{1e9, 1e9, "GN/m²"}, {1e6, 1e6, "MN/m²"}, {1e3, 1e3, "kN/m²"}, {0, 1, "N/m²"}},
	RotationalStiffness:   {{1e9, 1e9, "GN m/rad"}, {1e6, 1e6, "MN m/rad"}, {1e3, 1e3, "kN m/rad"}, {1, 1, "N m/rad"}, {0, 1e-3, "mN m/rad"}},
	BendingStiffnessBeam:  {{1e9, 1e9, "GN m²"}, {1e6, 1e6, "MN m²"}, {1e3, 1e3, "kN m²"}, {0.01, 1, "N m²"}, {0, 1e-6, "N mm²"}},
	BendingStiffnessPlate: {{1e9, 1e9, "GN m"}, {1e6, 1e6, "MN m"}, {1e3, 1e3, "kN m"}, {1, 1, "N m"}, {1e-3, 1e-3, "mN m"}, {0, 1e-6, "µN m"}},

	Angle:               {{0, math.Pi / 180, "°"}},
	Resistance:          {{1e9, 1e9, "GΩ"}, {1e6, 1e6, "MΩ"}, {1e3, 1e3, "kΩ"}, {1, 1, "Ω"}, {0, 1e-3, "mΩ"}},
	Capacitance:         {{1, 1, "F"}, {1e-3, 1e-3, "mF"}, {1e-6, 1e-6, "µF"}, {1e-9, 1e-9, "nF"}, {0, 1e-12, "pF"}},
	ForceFactor:         {{0, 1, "T m"}},
	Salinity:            {{0, 1, "g/kg"}},
	ForcePerLength:      {{1e6, 1e6, "MN/m"}, {1e3, 1e3, "kN/m"}, {1, 1, "N/m"}, {0, 1e-3, "mN/m"}},
	SpecificHeat:        {{1e4, 1e3, "kJ/(kg K)"}, {0, 1, "J/(kg K)"}},
	ThermalConductivity: {{0.1, 1, "W/(m K)"}, {0, 1e-3, "mW/(m K)"}},
}

var pressures = []step{{1e9, 1e9, "GPa"}, {1e6, 1e6, "MPa"}, {1e3, 1e3, "kPa"}, {1, 1, "Pa"}, {1e-3, 1e-3, "mPa"}, {0, 1e-6, "µPa"}}

// Digits of a formatted quantity: at most the first, at least the second.
const (
	mostDigits  = 4
	leastDigits = 3
)

// Format writes an SI value of kind k in the unit that the trade would use, with
// three digits, or four where the fourth is not zero: "12.5 mm", "7850 kg/m³".
func Format(value float64, k Kind) string {
	return string(AppendFormat(make([]byte, 0, 24), value, k))
}

// AppendFormat appends what [Format] returns.
func AppendFormat(dst []byte, value float64, k Kind) []byte {
	if k >= kindCount {
		k = Dimensionless
	}
	if k.bare() {
		return AppendNumber(dst, value, mostDigits)
	}
	if k == Temperature {
		return appendTemperature(dst, value)
	}
	s := rung(ladders[k], value)
	dst = appendDigits(dst, value/s.scale, mostDigits, leastDigits)
	if k != Angle {
		dst = append(dst, ' ')
	}
	return append(dst, s.symbol...)
}

// rung picks the step for a value. Zero has no size of its own and takes the SI
// unit or the one nearest to it.
func rung(ladder []step, value float64) step {
	size := math.Abs(value)
	if size == 0 {
		size = 1
	}
	// What rounds up to the next step belongs there: 999.97 Hz is 1.00 kHz.
	const rounding = 1 - 5e-5
	for _, s := range ladder {
		if size >= s.from*rounding {
			return s
		}
	}
	return ladder[len(ladder)-1]
}

// appendTemperature writes degrees Celsius down to about where permafrost and
// process engineering end and cryogenics, which count in kelvin, begin.
func appendTemperature(dst []byte, kelvin float64) []byte {
	const cryogenic = 173.15
	if !(kelvin >= cryogenic) {
		return append(appendDigits(dst, kelvin, mostDigits, leastDigits), " K"...)
	}
	// Hundredths, lest the difference from 273.15 show its rounding error.
	celsius := math.Round((kelvin-273.15)*100) / 100
	return append(appendDigits(dst, celsius, mostDigits, leastDigits), " °C"...)
}

// AppendNumber appends x rounded to the given number of significant digits, without
// trailing zeros: plainly from 1e-3 up to 1e5, otherwise as 1.2e-6. What
// is not finite is written in words, so that no NaN can reach a reader.
func AppendNumber(dst []byte, x float64, digits int) []byte {
	return appendDigits(dst, x, digits, 1)
}

// appendDigits appends x with at most most and at least least significant digits.
func appendDigits(dst []byte, x float64, most, least int) []byte {
	switch {
	case math.IsNaN(x):
		return append(dst, "undefined"...)
	case math.IsInf(x, 1):
		return append(dst, "infinite"...)
	case math.IsInf(x, -1):
		return append(dst, "-infinite"...)
	case x == 0:
		return append(dst, '0')
	case x < 0:
		dst = append(dst, '-')
		x = -x
	}
	most = min(max(most, 1), 17)
	least = min(max(least, 1), most)

	// strconv rounds: d.dddde±xx.
	var space [32]byte
	text := strconv.AppendFloat(space[:0], x, 'e', most-1, 64)
	var digits [17]byte
	n, i := 0, 0
	for ; text[i] != 'e'; i++ {
		if text[i] != '.' {
			digits[n] = text[i]
			n++
		}
	}
	exp := decimalExponent(text[i+1:])
	for n > least && digits[n-1] == '0' {
		n--
	}
	if exp < -3 || exp >= 5 {
		dst = point(dst, digits[:n], 1)
		dst = append(dst, 'e')
		return strconv.AppendInt(dst, int64(exp), 10)
	}
	return point(dst, digits[:n], exp+1)
}

// decimalExponent reads ±xx as strconv writes it.
func decimalExponent(text []byte) int {
	n := 0
	for _, c := range text[1:] {
		n = 10*n + int(c-'0')
	}
	if text[0] == '-' {
		return -n
	}
	return n
}

// point appends digits with the decimal point after the first whole ones, filled
// up with zeros on either side.
func point(dst, digits []byte, whole int) []byte {
	if whole <= 0 {
		dst = append(dst, "0."...)
		for range -whole {
			dst = append(dst, '0')
		}
		return append(dst, digits...)
	}
	for i := range whole {
		if i < len(digits) {
			dst = append(dst, digits[i])
			continue
		}
		dst = append(dst, '0')
	}
	if len(digits) > whole {
		dst = append(dst, '.')
		dst = append(dst, digits[whole:]...)
	}
	return dst
}
