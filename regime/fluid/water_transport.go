package fluid

import "math"

// viscosityDiluteWater is the viscosity of water vapour of vanishing density.
//
//	μ̄₀ = 100 √T̄ / Σ H_i/T̄^i, in µPa·s, T̄ = T/647.096 K
//
// T temperature in K. Range: 273.15 to 1173.15 K. Accuracy: 2 % or better.
// Check: with viscosityWater. Source: IAPWS R12-08 Eq. 11 and Table 1, from
// memory.
func viscosityDiluteWater(T float64) float64 {
	t := T / criticalTemperatureWater
	u := 1 / t
	return 100e-6 * math.Sqrt(t) / (1.67752 + u*(2.20462+u*(0.6366564-u*0.241605)))
}

// viscosityTerms is IAPWS R12-08 Table 2: a row for each power of (1/T̄ − 1),
// in it a column for each power of (ρ̄ − 1).
var viscosityTerms = [6][7]float64{
	{0.520094, 0.222531, -0.281378, 0.161913, -0.0325372, 0, 0},
	{0.0850895, 0.999115, -0.906851, 0.257399, 0, 0, 0},
	{-1.08374, 1.88797, -0.772479, 0, 0, 0, 0},
	{-0.289555, 1.26613, -0.489837, 0, 0.0698452, 0, -0.00435673},
	{0, 0, -0.257040, 0, 0, 0.00872102, 0},
	{0, 0.120573, 0, 0, 0, 0, -0.000593264},
}

// viscosityWater is the dynamic viscosity of ordinary water and steam without
// the critical enhancement, which is below 2 % outside the nearest
// neighbourhood of the critical point and nil in the range of liquid here.
//
//	μ = μ̄₀(T̄) exp(ρ̄ Σ_i (1/T̄ − 1)^i Σ_j H_ij (ρ̄ − 1)^j)
//
// T̄ = T/647.096 K, ρ̄ = ρ/322 kg/m³. Range: 273.15 to 1173.15 K, liquid to
// 100 MPa and far above. Accuracy: 1 % in the liquid, 0.17 % near 1 atm and
// room temperature. Check: 889.735100 µPa·s at 298.15 K and 998 kg/m³.
// Source: IAPWS R12-08 Eqs. 10 to 12, Tables 2 and 4, from memory.
func viscosityWater(T, ρ float64) float64 {
	x, y := criticalTemperatureWater/T-1, ρ/criticalDensityWater-1
	sum := 0.0
	for i := len(viscosityTerms) - 1; i >= 0; i-- {
		row := &viscosityTerms[i]
		inner := 0.0
		for j := len(row) - 1; j >= 0; j-- {
			inner = inner*y + row[j]
		}
		sum = sum*x + inner
	}
	return viscosityDiluteWater(T) * math.Exp((y+1)*sum)
}

// surfaceTensionWater is that of water against its vapour.
//
//	σ = 0.2358 τ^1.256 (1 − 0.625 τ) N/m, τ = 1 − T/647.096 K
//
// T temperature in K. Range: 273.16 to 647.096 K, used from 273.15 K.
// Accuracy: 0.5 % below 100 °C. Check: 72.74 mN/m at 20 °C; the measured value
// often quoted is 72.75. Source: IAPWS R1-76 Eq. 1 and Table 1, from memory.
func surfaceTensionWater(T float64) float64 {
	τ := 1 - T/criticalTemperatureWater
	return 0.2358 * math.Pow(τ, 1.256) * (1 - 0.625*τ)
}

// conductivityDiluteWater is the thermal conductivity of water vapour of
// vanishing density, in W/(m·K).
//
//	λ₀ = √T̄ / Σ L_k/T̄^k, in mW/(m·K), T̄ = T/647.096 K
//
// T temperature in K. Range: 273.16 to 1173.15 K. Accuracy: 2 %. Check:
// 18.4341883 mW/(m·K) at 298.15 K. Source: IAPWS R15-11 Eq. 16 and Tables 1
// and 4, from memory.
func conductivityDiluteWater(T float64) float64 {
	t := T / criticalTemperatureWater
	u := 1 / t
	sum := 2.443221e-3 + u*(1.323095e-2+u*(6.770357e-3+u*(-3.454586e-3+u*4.096266e-4)))
	return 1e-3 * math.Sqrt(t) / sum
}
