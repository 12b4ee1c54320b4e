package canon

import "math"

const soundMaxX = 1e10

// SoundCylinder gives the force on a circular cylinder that oscillates across
// its axis in a compressible fluid without viscosity.
//
//	Γ = Γr − iΓi = −H₁⁽²⁾(x)/(x H₁⁽²⁾′(x)), x = ka
//
// k = ω/c the wave number (1/m), ω the circular frequency (rad/s), c the speed of
// sound (m/s), a the radius (m). Per length, with the density ρ (kg/m³), the added
// mass is Γr ρπa² (kg/m) and the radiation damping constant Γi ωρπa² (N s/m²).
//
// Range: x from 0 to 1e10. Accuracy: 1e-12 of each part.
// Check value: x = 1 gives 0.622212837086 and 0.738796559136. Limits: x → 0 1
// with Γi = πx²/2; x → ∞ 1/(2x²) and 1/x, the plane wave.
//
// Source: Junger & Feit 1986, chapter 6 (from memory).
func SoundCylinder(x float64) (gammaR, gammaI float64, err error) {
	if err := inRange("SoundCylinder", "x", x, 0, soundMaxX); err != nil {
		return 0, 0, err
	}
	if x < 1e-9 {
		return 1, math.Pi / 2 * x * x, nil
	}
	if x > besselFar {
		// H₁⁽²⁾(x) is a constant times K₁(ix), and K₁′ = −K₀ − K₁/z.
		z := complex(0, x)
		g := 1 / (1 + z/besselKRatio(z))
		return real(g), -imag(g), nil
	}
	j1, y1 := math.J1(x), math.Y1(x)
	dj, dy := math.J0(x)-j1/x, math.Y0(x)-y1/x
	slope := x * (dj*dj + dy*dy)
	return -(j1*dj + y1*dy) / slope, 2 / (math.Pi * x) / slope, nil
}

// SoundSphere gives the force on a sphere that oscillates in a compressible
// fluid without viscosity.
//
//	Γ = Γr − iΓi = −2h₁⁽²⁾(x)/(x h₁⁽²⁾′(x)) = [2(2 + x²) − 2ix³]/(4 + x⁴), x = ka
//
// k = ω/c the wave number (1/m), c the speed of sound (m/s), a the radius (m).
// With the displaced mass ρV = ρ(4/3)πa³ (kg) the added mass is Γr ρV/2 and the
// radiation damping constant Γi ωρV/2 (N s/m).
//
// Range: x from 0 to 1e10. Accuracy: that of the machine.
// Check value: x = 1 gives 1.2 and 0.4. Limits: x → 0 1 with Γi = x³/2; x → ∞
// 2/x² and 2/x.
//
// Source: Junger & Feit 1986, chapter 2 (from memory).
func SoundSphere(x float64) (gammaR, gammaI float64, err error) {
	if err := inRange("SoundSphere", "x", x, 0, soundMaxX); err != nil {
		return 0, 0, err
	}
	x2 := x * x
	d := 4 + x2*x2
	return 2 * (2 + x2) / d, 2 * x * x2 / d, nil
}

// BaffledPiston gives the radiation impedance of a rigid circular piston in a
// rigid plane, one face wet.
//
//	R₁ = 1 − 2J₁(2x)/(2x), X₁ = 2H₁(2x)/(2x), x = ka
//
// H₁ is Struve's function. k = ω/c the wave number (1/m), c the speed of sound
// (m/s), a the radius (m). With the density ρ (kg/m³) the resistance is
// ρcπa² R₁ (N s/m) and the added mass ρcπa² X₁/ω (kg).
//
// Range: x from 0 to 1e10. Accuracy: 1e-12 of each part.
// Check value: x = 1 gives 0.423275192243 and 0.646763728284. Limits: x → 0
// x²/2 and 8x/(3π); x → ∞ 1 and 2/(πx).
//
// Source: Rayleigh 1896, vol. II § 302; Kinsler et al. 2000, section 7.5 (from memory).
func BaffledPiston(x float64) (r1, x1 float64, err error) {
	if err := inRange("BaffledPiston", "x", x, 0, soundMaxX); err != nil {
		return 0, 0, err
	}
	if x == 0 {
		return 0, 0, nil
	}
	x1 = struveH1(2*x) / x
	if x <= 2 {
		return pistonResistanceSeries(x), x1, nil
	}
	return 1 - math.J1(2*x)/x, x1, nil
}

// pistonResistanceSeries sums x²/(1!2!) − x⁴/(2!3!) + ….
func pistonResistanceSeries(x float64) float64 {
	x2 := x * x
	term := x2 / 2
	sum := term
	for k := 2.0; k < 40; k++ {
		term *= -x2 / (k * (k + 1))
		sum += term
		if math.Abs(term) < 1e-18*sum {
			break
		}
	}
	return sum
}

// FlexuralWaveLoading gives the load of a compressible fluid on one face of an
// infinite plate in which a flexural wave travels.
//
//	s < 1: added mass/(ρ/k_b) = 1/√(1 − s²), resistance 0
//	s ≥ 1: resistance/(ρc) = 1/√(1 − 1/s²), added mass 0
//	with |1 − s²| not below min(1, π/(k_b L)), s = k₀/k_b
//
// Both per area. k₀ = ω/c the wave number of sound (1/m), k_b that of the flexural
// wave (1/m), L the length of the plate (m), ρ the density of the fluid (kg/m³).
// The floor is the spectral width of a plate of that length: an infinite plate
// has no finite load at coincidence, s = 1, where this one steps from the mass to
// the resistance of equal impedance.
//
// Range: s from 0 to 1e8, k_b L from 1e-3 to 1e12. Accuracy: that of the machine.
// Check value: s = 0.6 gives the mass 1.25, s = 1.25 the resistance 5/3, far from
// the floor. Limits: s → 0 the mass ρ/k_b; s → ∞ the resistance ρc.
//
// Source: Junger & Feit 1986, chapter 8; Cremer, Heckl & Petersson 2005, chapter 6
// (from memory).
func FlexuralWaveLoading(s, kbL float64) (mass, resistance float64, err error) {
	const name = "FlexuralWaveLoading"
	if err := inRange(name, "s", s, 0, 1e8); err != nil {
		return 0, 0, err
	}
	if err := inRange(name, "kbL", kbL, 1e-3, 1e12); err != nil {
		return 0, 0, err
	}
	distance := math.Max(math.Abs((1-s)*(1+s)), math.Min(1, math.Pi/kbL))
	if s < 1 {
		return 1 / math.Sqrt(distance), 0, nil
	}
	return 0, s / math.Sqrt(distance), nil
}
