package kind

import (
	"fmt"
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// The fields of a piston.
var (
	piRadius    = &input.Field{Name: "radius", Type: input.Quantity, Kind: units.Length, Rule: "gt=0", Doc: "radius of the diaphragm, to the middle of its suspension", Needed: true}
	piMass      = quantity("moving_mass", units.Mass, "gt=0", "dry mass that moves, without air or water", "density times area and thickness")
	piThickness = quantity("thickness", units.Length, "gt=0", "thickness of the diaphragm", "")
	piStiffness = quantity("stiffness", units.Stiffness, "gt=0", "stiffness of the suspension, in place of a frequency", "")
	piBaffled   = flag("baffled", "whether a rigid plane surrounds the diaphragm", "true")
	piEnclosure = quantity("enclosure_volume", units.Volume, "gt=0", "volume of fluid sealed in behind the diaphragm; frequency_wet then is the one with the enclosure", "open on both sides")
	piStroke    = quantity("stroke", units.Length, "gte=0", "amplitude of the motion, in place of motion.amplitude", "")
)

// Piston is a rigid diaphragm on a suspension.
var Piston = &Kind{
	Name:   "piston",
	Title:  "Piston or diaphragm",
	Doc:    "a rigid round diaphragm on a suspension: loudspeaker, sound projector, valve disc; in a baffle or free, open behind or sealed",
	Fields: modal(piRadius, piMass, piThickness, piStiffness, piBaffled, piEnclosure, piStroke, MaterialName, SolidDensity),
	New:    newPiston,
}

// piston holds the solved problem of one piston.
type piston struct {
	a        float64
	sides    float64 // that face open fluid
	baffled  bool
	volume   float64 // sealed in behind, NaN without
	backlash float64 // stiffness of it
}

func newPiston(r *Resolver) Physics {
	p := &piston{a: r.c.X(piRadius), sides: 2, baffled: r.c.Flag(piBaffled, true), volume: math.NaN()}
	r.take(scale.Length, piRadius)
	r.stroke(piStroke)
	r.closeGroups()
	r.damping()
	p.around(r)
	p.masses(r)
	over := 4 * math.Pi * math.Pi * r.X(scale.DryMass)
	spring, most := func(float64) float64 { return 0 }, 0.0
	if p.sealed() && r.Is(group.Fluid) {
		most = p.backlash / over
		spring = func(float64) float64 { return most }
	}
	r.sprung(r.suspension(piStiffness), "√(k/m)/2π", r.gamma(p.viscous), spring, most, scale.DryMass, scale.AddedMass, scale.Density, scale.SoundSpeed)
	r.interestOf()
	return p
}

func (p *piston) sealed() bool { return !math.IsNaN(p.volume) }

// around reads what surrounds the piston.
func (p *piston) around(r *Resolver) {
	if !r.c.Has(piBaffled) && r.Is(group.Fluid) {
		r.warn(piBaffled, "assumed", "A rigid baffle is taken to surround the diaphragm.")
	}
	p.volume = r.c.X(piEnclosure)
	if depth := r.c.X(BackingDepth); !math.IsNaN(depth) {
		if p.sealed() {
			r.contradict(BackingDepth, fmt.Sprintf("%s and %s both say how much fluid is sealed in.", piEnclosure.Path(), BackingDepth.Path()))
			return
		}
		p.volume = math.Pi * p.a * p.a * depth
	}
	if p.sealed() {
		p.sides = 1
		c, area := r.X(scale.SoundSpeed), math.Pi*p.a*p.a
		p.backlash = r.X(scale.Density) * c * c * area * area / p.volume
		if r.c.Has(FrequencyWet) {
			r.warn(FrequencyWet, "check", "The wet frequency is taken as that with the enclosure; a data sheet often gives it in the open.")
		}
	}
	if gap := r.X(scale.WallGap); !math.IsNaN(gap) && r.Is(group.Fluid) {
		if atMost(gap, p.a) {
			r.contradict(WallGap, "A wall nearer than the radius makes a film: use the kind film.")
			return
		}
		r.warn(WallGap, "left-out", "The wall is further away than the radius and is left out.")
	}
	r.nearSurface(p.a)
}

// masses resolves dry, displaced and added mass.
func (p *piston) masses(r *Resolver) {
	r.takeOrNeed(scale.Thickness, piThickness)
	solidDensity(r)
	rho, h, area := r.X(scale.Density), r.X(scale.Thickness), math.Pi*p.a*p.a
	r.Value(scale.DryMass).Kind = units.Mass
	if !r.take(scale.DryMass, piMass) {
		r.derive(scale.DryMass, r.X(scale.SolidDensity)*area*h, units.Mass, "ρ_s times area and thickness")
		r.Need(scale.DryMass, piMass.Path())
	}
	r.displace(rho*area*h, units.Mass, "ρ times area and thickness", h, piThickness)
	load, how := p.load()
	r.derive(scale.AddedMass, load*rho, units.Mass, how)
	r.derive(scale.AddedMassFree, load*rho, units.Mass, how)
	r.addedNeeds(units.Mass)
	r.derive(scale.ViscousLength, p.a, units.Length, "the radius")
	r.closeGroups()
}

// load is the added mass over the density, of a fluid without compression.
//
//	in a baffle (8/3)a³ a side; free (8/3)a³ in all; at the end of a box 0.6133πa³
//
// Symbols: a radius (m). Range: k₀a ≪ 1. Accuracy: exact; the box as a long tube.
// Check: a 0.1 m in air of 1.21 kg/m³: 3.23 g a side. Source: Rayleigh 1896, § 302;
// Lamb 1932, § 102; Levine & Schwinger 1948 (from memory).
func (p *piston) load() (float64, string) {
	disc := 8. / 3 * p.a * p.a * p.a
	switch {
	case p.baffled && p.sealed():
		return disc, "(8/3)ρa³ in front"
	case p.baffled:
		return 2 * disc, "(8/3)ρa³ on each side"
	case p.sealed():
		return openEnd * math.Pi * p.a * p.a * p.a, "0.6133 πρa³ in front, as at the open end of a tube"
	default:
		return disc, "(8/3)ρa³ in all, of a free disc"
	}
}

// openEnd is the end correction of a tube without a flange over its radius.
const openEnd = 0.6133

// dipoleOfDisc is the radius of the sphere that radiates like a free disc of
// radius 1: x³/2 = (2/9π)(k₀a)³ of its resistance over its inertia.
//
//	R = ρcπa² (16/27π²)(k₀a)⁴, m = (8/3)ρa³
//
// Range: k₀a ≪ 1, beyond within a factor of 2. Accuracy: exact there. Check: the
// force iω(8/3)ρa³u radiates F²k²/(24πρc). Source: Lamb 1932, § 102, from memory;
// power of a dipole by Junger & Feit 1986, chapter 2, from memory.
var dipoleOfDisc = math.Cbrt(4 / (9 * math.Pi))

// viscous is Γ of a layer at the rim: of a strip as wide as the radius, which
// has as much edge for its area as the disc.
func (p *piston) viscous(f, nu float64) (gr, gi float64, err error) {
	return ribbon(2 * math.Pi * f * p.a * p.a / 4 / nu)
}

// Groups puts the groups of a piston.
func (p *piston) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.15, Viscous: 2, Acoustic: 1.15, Flow: 2, Buckling: 2, Flutter: 2}
	if !p.baffled {
		g.Acoustic = 2 // a cousin where the wave is not long
	}
	if !g.Is(group.Fluid) {
		return
	}
	g.Traits |= group.ViscousSolved
	f, c := s.X(scale.FrequencyWet), s.X(scale.SoundSpeed)
	viscousGroups(s, g, p.viscous)
	sprungDamping(s, g)
	soundGroups(s, g, 2*math.Pi*f*p.a/c, p.sound)
	acousticStep(s, g, p.sides*math.Pi*p.a*p.a)
	if g.Is(group.NearSurface) {
		p.surface(s, g)
	}
	if p.sealed() {
		p.enclosure(s, g)
	}
	if !g.Is(group.Liquid) {
		putOrWait(s, g, group.Knudsen, meanFreePath(s)/p.a, scale.HeatCapacityRatio, scale.KinematicViscosity, scale.SoundSpeed)
	}
	quality(s, g)
}

// sound is Γ of sound over the inertia without it; x is k₀a.
func (p *piston) sound(x float64) (gr, gi float64, err error) {
	if !p.baffled && !p.sealed() {
		return canon.SoundSphere(dipoleOfDisc * x)
	}
	const short, long = 1e-6, 1e10
	x = math.Max(short, math.Min(x, long))
	r1, x1, err := canon.BaffledPiston(x)
	ideal := 8 * x / (3 * math.Pi)
	if p.baffled {
		return x1 / ideal, r1 / ideal, err
	}
	// at the end of a box a long wave goes all round: half the resistance
	return x1 / ideal, r1 * (1 + math.Min(x*x/4, 1)) / 2 / (openEnd * x), err
}

// surface puts the factor of a surface at depth d by the first image: of a
// source in a baffle across the surface, or in front of a box, by a/d; of a
// free disc along the surface by its dipole, (a/d)³/6π.
func (p *piston) surface(s *scale.Set, g *group.Set) {
	ratio := p.a / s.X(scale.Depth)
	var x float64
	switch {
	case p.baffled:
		x = 3 * math.Pi / 32 * ratio
	case p.sealed():
		x = ratio / (8 * openEnd)
	default:
		x = ratio * ratio * ratio / (6 * math.Pi)
	}
	image(g, x)
}

// enclosure puts the stiffness and the first resonance of what is sealed in,
// taken as compact: half a wave along the side of a cube of its volume.
func (p *piston) enclosure(s *scale.Set, g *group.Set) {
	g.Traits |= group.Cavity
	omega := 2 * math.Pi * s.X(scale.FrequencyDry)
	putOrWait(s, g, group.FluidStiffness, p.backlash/(s.X(scale.DryMass)*omega*omega), scale.SoundSpeed, scale.Density, scale.DryMass, scale.FrequencyDry)
	putOrWait(s, g, group.CavityFrequency, s.X(scale.FrequencyWet)*2*math.Cbrt(p.volume)/s.X(scale.SoundSpeed), scale.FrequencyWet, scale.SoundSpeed)
}
