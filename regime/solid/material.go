package solid

import (
	"math"

	"regimed/regime/cite"
)

// Material is a linear elastic isotropic solid, or is taken as one.
type Material struct {
	Name    string // as a case names it
	Title   string
	Density float64 // kg/m³
	Young   float64 // Young's modulus, Pa
	Poisson float64
	// LinearStrain is the strain up to which stress is about proportional to
	// it; for brittle materials the strain at which they break in tension. NaN
	// if unknown.
	LinearStrain float64
	Typical      bool // typical values, not those of a given delivery
	Sources      []*cite.Source
	Note         string // what the values stand for, and how far they scatter
}

// BarSpeed is the speed of longitudinal waves in a thin bar.
//
//	c = √(E/ρ)
//
// E Young's modulus in Pa, ρ density in kg/m³, c in m/s. Range: bars thin
// against the wavelength. Accuracy: that of the typical values. Check: 5170
// m/s for steel. Source: any text on acoustics; Kinsler et al., appendix A10,
// for values.
func (m *Material) BarSpeed() float64 { return math.Sqrt(m.Young / m.Density) }
