package fluid

import "math"

// Constants of IAPWS-IF97: Eqs. 1 to 4 for the substance, section 5.1 for the
// reducing quantities of region 1.
const (
	gasConstantWater         = 461.526   // J/(kg·K)
	criticalTemperatureWater = 647.096   // K
	criticalDensityWater     = 322.0     // kg/m³
	reducingPressure1        = 16.53e6   // Pa
	reducingTemperature1     = 1386.0    // K
	lowestTemperature1       = 273.15    // K
	highestTemperature1      = 623.15    // K
	highestPressure1         = 100e6     // Pa
	lowestSaturationPressure = 611.21268 // Pa, region 4 at 273.15 K rounded up
)

// region1 holds what follows from the Gibbs function of liquid water.
type region1 struct {
	volume       float64 // m³/kg
	entropy      float64 // J/(kg·K)
	enthalpy     float64 // J/kg
	isobaricHeat float64 // J/(kg·K)
	isochoric    float64 // J/(kg·K), heat capacity at constant volume
	soundSpeed   float64 // m/s
}

// gibbsTerm is one row of IF97 Table 2.
type gibbsTerm struct {
	i, j int
	n    float64
}

// gibbsTerms is IAPWS-IF97 Table 2.
var gibbsTerms = [34]gibbsTerm{
	{0, -2, 0.14632971213167}, {0, -1, -0.84548187169114},
	{0, 0, -0.37563603672040e1}, {0, 1, 0.33855169168385e1},
	{0, 2, -0.95791963387872}, {0, 3, 0.15772038513228},
	{0, 4, -0.16616417199501e-1}, {0, 5, 0.81214629983568e-3},
	{1, -9, 0.28319080123804e-3}, {1, -7, -0.60706301565874e-3},
	{1, -1, -0.18990068218419e-1}, {1, 0, -0.32529748770505e-1},
	{1, 1, -0.21841717175414e-1}, {1, 3, -0.52838357969930e-4},
	{2, -3, -0.47184321073267e-3}, {2, 0, -0.30001780793026e-3},
	{2, 1, 0.47661393906987e-4}, {2, 3, -0.44141845330846e-5},
	{2, 17, -0.72694996297594e-15}, {3, -4, -0.31679644845054e-4},
	{3, 0, -0.28270797985312e-5}, {3, 6, -0.85205128120103e-9},
	{4, -5, -0.22425281908000e-5}, {4, -2, -0.65171222895601e-6},
	{4, 10, -0.14341729937924e-12}, {5, -8, -0.40516996860117e-6},
	{8, -11, -0.12734301741641e-8}, {8, -6, -0.17424871230634e-9},
	{21, -29, -0.68762131295531e-18}, {23, -31, 0.14478307828521e-19},
	{29, -38, 0.26335781662795e-22}, {30, -39, -0.11947622640071e-22},
	{31, -40, 0.18228094581404e-23}, {32, -41, -0.93537087292458e-25},
}

// The powers that Table 2 uses.
const (
	highestI = 32
	lowestJ  = -41
	highestJ = 17
)

// gibbs1 is the dimensionless Gibbs function and its derivatives.
type gibbs1 struct{ γ, γπ, γππ, γτ, γττ, γπτ float64 }

// gibbsRegion1 sums the Gibbs function of region 1.
//
//	γ = Σ n (7.1 − π)^I (τ − 1.222)^J
//
// π = p/16.53 MPa, τ = 1386 K/T. Range: 273.15 to 623.15 K, saturation to
// 100 MPa; the derivatives are of the formula, so their accuracy is that of γ.
// Check: IAPWS-IF97 Table 5 through waterRegion1. Source: IAPWS-IF97 Eq. 7.
//
// The powers are tabulated by multiplication first: 34 calls of math.Pow
// would cost more than all the rest of a state.
func gibbsRegion1(π, τ float64) gibbs1 {
	a, b := 7.1-π, τ-1.222
	var pa [highestI + 1]float64
	pa[0] = 1
	for i := 1; i <= highestI; i++ {
		pa[i] = pa[i-1] * a
	}
	var pb [highestJ - lowestJ + 1]float64
	pb[-lowestJ] = 1
	for j := -lowestJ + 1; j < len(pb); j++ {
		pb[j] = pb[j-1] * b
	}
	inverse := 1 / b
	for j := -lowestJ - 1; j >= 0; j-- {
		pb[j] = pb[j+1] * inverse
	}
	var g gibbs1
	for k := range gibbsTerms {
		t := &gibbsTerms[k]
		i, j := float64(t.i), float64(t.j)
		term := t.n * pa[t.i] * pb[t.j-lowestJ]
		g.γ += term
		g.γπ -= i * term
		g.γππ += i * (i - 1) * term
		g.γτ += j * term
		g.γττ += j * (j - 1) * term
		g.γπτ -= i * j * term
	}
	g.γπ /= a
	g.γππ /= a * a
	g.γτ /= b
	g.γττ /= b * b
	g.γπτ /= a * b
	return g
}

// waterRegion1 gives the thermodynamic state of liquid water.
//
//	v   = R T/p · π γ_π
//	s   = R (τ γ_τ − γ)
//	h   = R T τ γ_τ
//	c_p = −R τ² γ_ττ
//	c_v = R (−τ² γ_ττ + (γ_π − τ γ_πτ)²/γ_ππ)
//	w²  = R T γ_π² / ((γ_π − τ γ_πτ)²/(τ² γ_ττ) − γ_ππ)
//
// T temperature in K, p pressure in Pa. Range: 273.15 to 623.15 K, saturation
// to 100 MPa. Accuracy: density 0.001 % near 1 atm, 0.02 % to 100 MPa up to
// 573 K; w 0.1 % to 0.3 %. Check: at 300 K and 3 MPa v = 0.00100215168 m³/kg,
// w = 1507.73921 m/s. Source: IAPWS-IF97 Table 3 and Table 5, from memory.
func waterRegion1(T, p float64) region1 {
	π, τ := p/reducingPressure1, reducingTemperature1/T
	g := gibbsRegion1(π, τ)
	const R = gasConstantWater
	mixed := g.γπ - τ*g.γπτ
	thermal := τ * τ * g.γττ
	return region1{
		volume:       R * T / p * π * g.γπ,
		entropy:      R * (τ*g.γτ - g.γ),
		enthalpy:     R * T * τ * g.γτ,
		isobaricHeat: -R * thermal,
		isochoric:    R * (-thermal + mixed*mixed/g.γππ),
		soundSpeed:   math.Sqrt(R * T * g.γπ * g.γπ / (mixed*mixed/thermal - g.γππ)),
	}
}

// saturationPressureWater is the vapour pressure of pure water.
//
//	p = (2C/(−B + √(B² − 4AC)))⁴ in MPa, ϑ = T + n₉/(T − n₁₀),
//	A = ϑ² + n₁ϑ + n₂, B = n₃ϑ² + n₄ϑ + n₅, C = n₆ϑ² + n₇ϑ + n₈
//
// T temperature in K. Range: 273.15 to 647.096 K. Accuracy: 0.025 %. Check:
// 3536.58941 Pa at 300 K. Source: IAPWS-IF97 Eq. 30, Tables 34 and 35, from
// memory.
func saturationPressureWater(T float64) float64 {
	ϑ := T - 0.23855557567849/(T-0.65017534844798e3)
	A := (ϑ+0.11670521452767e4)*ϑ - 0.72421316703206e6
	B := (-0.17073846940092e2*ϑ+0.12020824702470e5)*ϑ - 0.32325550322333e7
	C := (0.14915108613530e2*ϑ-0.48232657361591e4)*ϑ + 0.40511340542057e6
	root := 2 * C / (-B + math.Sqrt(B*B-4*A*C))
	square := root * root
	return square * square * 1e6
}
