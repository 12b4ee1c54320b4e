package fluid

import (
	"math"

	"regimed/regime/cite"
)

// Scales of the seawater formulas: temperature in °C on IPTS-68, sea pressure
// in bar above one standard atmosphere.
const (
	standardAtmosphere  = 101325.0 // Pa
	zeroCelsius         = 273.15   // K
	scale68             = 1.00024  // t68/t90, 0 to 40 °C
	highestSeaPressure  = 1000.0   // bar
	pascalPerBar        = 1e5
	highestSeawaterSalt = 40.0 // the sound speed ends here, the density at 42
)

// seawater is salt water of the composition of the open ocean.
var seawater = &Model{
	Name: "seawater", Title: "seawater", Phase: Liquid,
	UsesTemperature: true, UsesPressure: true, UsesSalinity: true,
	Default: State{Temperature: 288.15, Pressure: standardAtmosphere, Salinity: 35},
	Range: Range{
		Temperature: Interval{zeroCelsius, zeroCelsius + 40},
		Pressure:    Interval{500, standardAtmosphere + highestSeaPressure*pascalPerBar},
		Salinity:    Interval{0, highestSeawaterSalt},
	},
	Sources: []*cite.Source{cite.UNESCO44, cite.Sharqawy2010, cite.IAPWSIF97, cite.IAPWSR176, cite.Nayar2014},
	Note: "EOS-80: density within 0.01 kg/m³ at one atmosphere, sound speed within 1 m/s; viscosity within 1.5 % at one atmosphere, " +
		"its dependence on pressure left out (to 1000 bar it is below 8 % in pure water); below one atmosphere, down to the vapour pressure, " +
		"density and sound speed are held at their values at one atmosphere, which changes the density by less than 0.005 %; " +
		"practical salinity stands for g/kg, 0.5 % of the salt",
	limits: seawaterLimits,
	eval:   seawaterAt,
}

func seawaterLimits(s State) (Interval, string) {
	return Interval{vapourPressureSeawater(s.Temperature, s.Salinity), math.Inf(1)},
		"seawater boils below the vapour pressure of its temperature"
}

func seawaterAt(s State) Properties {
	t90 := s.Temperature - zeroCelsius
	t68 := t90 * scale68
	bar := math.Max(0, s.Pressure-standardAtmosphere) / pascalPerBar
	p := nothing()
	p.Density = densitySeawater(s.Salinity, t68, bar)
	p.SoundSpeed = soundSpeedSeawater(s.Salinity, t68, bar)
	p.Viscosity = viscositySeawater(s.Salinity, t90)
	p.VapourPressure = vapourPressureSeawater(s.Temperature, s.Salinity)
	p.SurfaceTension = surfaceTensionSeawater(s.Temperature, s.Salinity)
	return p
}

// polynomial is Σ c_k x^k.
func polynomial(x float64, c ...float64) float64 {
	sum := 0.0
	for k := len(c) - 1; k >= 0; k-- {
		sum = sum*x + c[k]
	}
	return sum
}

// densitySeawater is the international equation of state of seawater, EOS-80.
//
//	ρ = ρ₀(S, t)/(1 − p/K(S, t, p))
//
// S practical salinity, t temperature in °C (IPTS-68), p sea pressure in bar,
// ρ₀ density at one atmosphere in kg/m³, K secant bulk modulus in bar. Range:
// S 0 to 42, −2 to 40 °C, 0 to 1000 bar. Accuracy: 0.0036 kg/m³ at one
// atmosphere, 0.009 kg/m³ over the range. Check: 1027.67547 kg/m³ at S 35,
// 5 °C, 0 bar; 1062.53817 at S 35, 25 °C, 1000 bar. Source: UNESCO 44 pp. 15
// to 20 and 22, from memory.
func densitySeawater(S, t, p float64) float64 {
	return densitySurface(S, t) / (1 - p/secantBulkModulus(S, t, p))
}

// densitySurface is ρ₀ = ρ_w + A S + B S^(3/2) + C S², the part of EOS-80 at
// one atmosphere; symbols, range and source at densitySeawater.
func densitySurface(S, t float64) float64 {
	ρw := polynomial(t, 999.842594, 6.793952e-2, -9.095290e-3, 1.001685e-4, -1.120083e-6, 6.536332e-9)
	A := polynomial(t, 8.24493e-1, -4.0899e-3, 7.6438e-5, -8.2467e-7, 5.3875e-9)
	B := polynomial(t, -5.72466e-3, 1.0227e-4, -1.6546e-6)
	const C = 4.8314e-4
	return ρw + S*(A+B*math.Sqrt(S)+C*S)
}

// secantBulkModulus is K = K₀(S, t) + A(S, t) p + B(S, t) p² of EOS-80 in bar;
// symbols, range and source at densitySeawater. Check: 22185.93358 bar at S 35,
// 5 °C, 0 bar; 27108.94504 at S 35, 25 °C, 1000 bar.
func secantBulkModulus(S, t, p float64) float64 {
	root := math.Sqrt(S)
	K0 := polynomial(t, 19652.21, 148.4206, -2.327105, 1.360477e-2, -5.155288e-5) +
		S*polynomial(t, 54.6746, -0.603459, 1.09987e-2, -6.1670e-5) +
		S*root*polynomial(t, 7.944e-2, 1.6483e-2, -5.3009e-4)
	A := polynomial(t, 3.239908, 1.43713e-3, 1.16092e-4, -5.77905e-7) +
		S*polynomial(t, 2.2838e-3, -1.0981e-5, -1.6078e-6) +
		S*root*1.91075e-4
	B := polynomial(t, 8.50935e-5, -6.12293e-6, 5.2787e-8) +
		S*polynomial(t, -9.9348e-7, 2.0816e-8, 9.1697e-10)
	return K0 + p*(A+p*B)
}

// soundSpeedSeawater is the speed of sound of Chen and Millero.
//
//	c = C_w(t, p) + A(t, p) S + B(t, p) S^(3/2) + D(t, p) S²
//
// S practical salinity, t temperature in °C (IPTS-68), p sea pressure in bar,
// c in m/s. Range: S 0 to 40, 0 to 40 °C, 0 to 1000 bar. Accuracy: 0.2 m/s
// near the surface; later measurements find it up to 0.7 m/s high at depth.
// Check: 1731.995 m/s at S 40, 40 °C, 1000 bar. Source: UNESCO 44 Eq. 31 to 35
// pp. 46 to 50, from memory. The coefficients are those for IPTS-68; a later
// refit to ITS-90 differs by less than 0.03 m/s.
func soundSpeedSeawater(S, t, p float64) float64 {
	Cw := polynomial(p,
		polynomial(t, 1402.388, 5.03711, -5.80852e-2, 3.3420e-4, -1.47800e-6, 3.1464e-9),
		polynomial(t, 0.153563, 6.8982e-4, -8.1788e-6, 1.3621e-7, -6.1185e-10),
		polynomial(t, 3.1260e-5, -1.7107e-6, 2.5974e-8, -2.5335e-10, 1.0405e-12),
		polynomial(t, -9.7729e-9, 3.8504e-10, -2.3643e-12))
	A := polynomial(p,
		polynomial(t, 1.389, -1.262e-2, 7.164e-5, 2.006e-6, -3.21e-8),
		polynomial(t, 9.4742e-5, -1.2580e-5, -6.4885e-8, 1.0507e-8, -2.0122e-10),
		polynomial(t, -3.9064e-7, 9.1041e-9, -1.6002e-10, 7.988e-12),
		polynomial(t, 1.100e-10, 6.649e-12, -3.389e-13))
	B := polynomial(t, -1.922e-2, -4.42e-5) + p*polynomial(t, 7.3637e-5, 1.7945e-7)
	D := 1.727e-3 - 7.9836e-6*p
	return Cw + S*(A+B*math.Sqrt(S)+D*S)
}

// viscositySeawater is the dynamic viscosity at one atmosphere.
//
//	μ = μ_w (1 + A s + B s²), μ_w = 4.2844e-5 + 1/(0.157 (t + 64.993)² − 91.296)
//	A = 1.541 + 1.998e-2 t − 9.52e-5 t², B = 7.974 − 7.561e-2 t + 4.724e-4 t²
//
// μ in Pa·s, t temperature in °C (ITS-90), s salt in kg/kg, here S/1000. Range:
// 0 to 180 °C, 0 to 0.15 kg/kg. Accuracy: 1.5 %. Check: 1.22e-3 Pa·s at 15 °C
// and S 35 (ITTC table, 3 digits). Source: Sharqawy et al. 2010 Eqs. 22 and
// 23, from memory.
func viscositySeawater(S, t float64) float64 {
	s, shifted := S/1000, t+64.993
	μw := 4.2844e-5 + 1/(0.157*shifted*shifted-91.296)
	A := polynomial(t, 1.541, 1.998e-2, -9.52e-5)
	B := polynomial(t, 7.974, -7.561e-2, 4.724e-4)
	return μw * (1 + s*(A+s*B))
}

// vapourPressureSeawater is that of pure water lowered by the salt.
//
//	p_v = p_w(T)/(1 + 0.57357 S/(1000 − S))
//
// p_w vapour pressure of pure water in Pa, T temperature in K, S salt in g/kg.
// Range: 0 to 240 g/kg. Accuracy: 0.1 % of p_w. Check: 1.671 kPa at 15 °C and
// S 35 (ITTC table). Source: Sharqawy et al. 2010 Eq. 32, Raoult's law with
// the mean molar mass of sea salt, from memory.
func vapourPressureSeawater(T, S float64) float64 {
	return saturationPressureWater(T) / (1 + 0.57357*S/(1000-S))
}

// surfaceTensionSeawater is that of pure water raised by the salt.
//
//	σ = σ_w(T) (1 + (2.26e-4 t + 9.46e-3) ln(1 + 0.0331 S))
//
// σ_w surface tension of pure water in N/m, t temperature in °C, S salt in
// g/kg. Range: 0 to 40 °C, 0 to 40 g/kg. Accuracy: 0.2 % of its data. Check:
// within 0.8 % of the later correlation 1 + 3.766e-4 S + 2.347e-6 S t of
// Nayar et al. 2014, which begins at 1 °C and therefore is not the one used.
// Source: Sharqawy et al. 2010 Eq. 28, from memory.
func surfaceTensionSeawater(T, S float64) float64 {
	t := T - zeroCelsius
	return surfaceTensionWater(T) * (1 + (2.26e-4*t+9.46e-3)*math.Log1p(0.0331*S))
}
