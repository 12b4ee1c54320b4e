package kind

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/scale"
)

// A shell ovals where it is thin; with less than this of its radius for a wall
// a ring is thin to 1 % in frequency.
const thinWall = 0.1

// Waves around the circumference that are looked at.
const mostWaves = 30

// shellMode is the lowest frequency of a thin empty tube with n ≥ 2 waves
// around, and that n.
//
//	ω² = (h²/12R²)(c_p/R)² n²(n² − 1)²/(n² + 1) + (c_0/R)² (βR/ℓ)⁴/(n²(n² + 1))
//
// Symbols: R mean radius, h wall, ℓ length, β root of the beam with these
// supports; c_p² = E/(ρ_s(1 − ν²)), c_0² = E/ρ_s. The first term is RingMode, the
// second the stretching of the wall along the tube without shear or hoop strain.
// Range: h/R below 0.1, no stiffening rings; n = 1 of the second term is the
// beam itself. Accuracy: 10 % for ℓ/R above 10. Check: ℓ → ∞, h/R 0.01, ν 0.3, n = 2:
// 0.008120 = ωR/c_0, which is what is returned. Source: Love 1927, section 293, and the energy of an
// inextensional shell.
func shellMode(wall, beta, poisson float64) (ratio float64, waves int) {
	ratio = math.Inf(1)
	for n := 2; n <= mostWaves; n++ {
		ring, err := canon.RingMode(n)
		if err != nil {
			break
		}
		bending := wall / math.Sqrt(12*(1-poisson*poisson)) * ring
		x := float64(n * n)
		stretching := beta * beta / math.Sqrt(x*(x+1))
		if f := math.Hypot(bending, stretching); f < ratio {
			ratio, waves = f, n
		}
	}
	return ratio, waves
}

// oval finds the speed at which the section of a thin empty shell ovals in gas:
// two vortices a period of the shell, U = f_n D/(2 St).
func (c *cylinder) oval(r *Resolver) {
	wall := r.c.X(cylWall)
	radius := (c.d - wall) / 2
	c.ovalling = math.NaN()
	if math.IsNaN(wall) || !atMost(wall, thinWall*radius) || r.c.Has(cylContents) || !r.Is(group.Gas) {
		return
	}
	c.thin = true
	sound := math.Sqrt(r.X(scale.Young) / r.X(scale.SolidDensity))
	beta := 0.0
	if root, err := canon.BeamMode(c.support, 1, 0); err == nil && !c.spring {
		beta = root * radius / r.X(scale.Span)
	}
	ratio, waves := shellMode(wall/radius, beta, r.X(scale.Poisson))
	c.ovalling, c.ovals = ratio*sound/(2*math.Pi*radius), waves
}

// ovallingStrouhal is the Strouhal number of the ovalling criterion (ASME STS-1,
// from memory).
const ovallingStrouhal = 0.2

// ovallingGroups puts the speed ratio of ovalling.
func (c *cylinder) ovallingGroups(s *scale.Set, g *group.Set) {
	if !c.thin || g.Has(group.Strouhal) && g.Get(group.Strouhal) == 0 {
		return
	}
	st := ovallingStrouhal
	if !math.IsNaN(c.wake.strouhal) {
		st = c.wake.strouhal
	}
	ratio := s.X(scale.SpeedHigh) * 2 * st / (c.ovalling * c.d)
	if math.IsNaN(ratio) {
		waitFor(s, g, []scale.ID{scale.SpeedHigh, scale.Speed, scale.Young, scale.SolidDensity, scale.Span}, group.OvallingSpeed)
		return
	}
	g.Put(group.OvallingSpeed, math.Min(ratio, 1e300))
	g.Put(group.OvallingMode, float64(c.ovals))
}
