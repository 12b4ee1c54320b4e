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

// The fields of a microbeam.
var (
	mbLength    = &input.Field{Name: "length", Type: input.Quantity, Kind: units.Length, Rule: "gt=0", Doc: "length of the beam, or of a prong", Needed: true}
	mbWidth     = &input.Field{Name: "width", Type: input.Quantity, Kind: units.Length, Rule: "gt=0", Doc: "width across the motion", Needed: true}
	mbThickness = quantity("thickness", units.Length, "gt=0", "thickness along the motion", "")
	mbMass      = quantity("mass_per_length", units.MassPerLength, "gt=0", "dry mass per length", "density times width and thickness")
	mbSupport   = choice("support", "how the beam is held", "clamped-free", "clamped-free", "clamped-clamped", "tuning-fork")
	mbMode      = whole("mode", "gte=1,lte=10", "number of the bending mode", "1")
	mbProngs    = quantity("prong_gap", units.Length, "gt=0", "gap between the prongs of a tuning fork, which close on each other", "wide")
)

// Microbeam is a small beam in gas or liquid.
var Microbeam = &Kind{
	Name:   "microbeam",
	Title:  "Micro beam or tuning fork",
	Doc:    "a thin cantilever, doubly clamped beam or tuning fork that bends in gas or liquid at rest, free or over a wall",
	Fields: modal(elastic(mbLength, mbWidth, mbThickness, mbMass, mbSupport, mbMode, mbProngs)...),
	New:    newMicrobeam,
}

// microbeam holds the solved problem of one beam.
type microbeam struct {
	squeeze
	b, l, h  float64
	mode     int
	support  canon.BeamSupport
	factors  canon.BeamFactors
	lambda   float64 // β_n L
	near     bool    // a wall or another prong nearer than a width
	fork     bool    // two prongs that move against each other
	released float64 // dry frequency by geometry
}

func newMicrobeam(r *Resolver) Physics {
	p := &microbeam{squeeze: squeeze{side: r.c.X(mbWidth)}, b: r.c.X(mbWidth), l: r.c.X(mbLength), mode: 1}
	p.shape(r)
	r.closeGroups()
	r.damping()
	r.material()
	p.masses(r)
	p.loads(r)
	spring, most := p.springOver(r)
	r.sprung(p.released, fmt.Sprintf("λ²/(2πℓ²) √(EI/m), λ = %.5g", p.lambda), r.gamma(p.viscous), spring, most,
		scale.DryMass, scale.AddedMass, scale.Density, scale.Viscosity, scale.SoundSpeed, scale.HeatCapacityRatio)
	r.interestOf()
	r.strains(p.l, p.factors.MaxCurvature, p.h, mbThickness)
	return p
}

func (p *microbeam) shape(r *Resolver) {
	p.h = r.c.X(mbThickness)
	r.take(scale.Length, mbWidth)
	r.Put(scale.Span, p.l, units.Length, scale.Given, "")
	r.takeOrNeed(scale.Thickness, mbThickness)
	r.derive(scale.ViscousLength, p.b/2, units.Length, "half the width")
	r.trait(group.Flexible)
	support := r.c.Choice(mbSupport, "clamped-free")
	if !r.c.Has(mbSupport) {
		r.warn(mbSupport, "assumed", "The beam is taken as a cantilever.")
	}
	p.support = canon.ClampedFree
	if support == "clamped-clamped" {
		p.support = canon.ClampedClamped
		r.trait(group.Restrained)
	} else {
		r.trait(group.Cantilever)
	}
	if v := r.c.Lookup(mbMode); v != nil {
		p.mode = int(v.Q.Value)
	}
	p.fork = support == "tuning-fork"
	p.lambda, _ = canon.BeamMode(p.support, p.mode, 0)
	p.factors, _ = canon.BeamModeFactors(p.support, p.mode)
	switch {
	case p.mode > 3:
		r.warn(mbMode, "approximate", fmt.Sprintf("Beyond mode 3 the fluid also flows along the beam: at β_n b = %.2g the solution of a strip overrates the added mass and the damping.", p.lambda*p.b/p.l))
	case p.l < 3*p.b:
		r.warn(mbLength, "approximate", "The beam is short for its width: the solution of a strip overrates the added mass and the damping.")
	}
	p.walls(r, support)
}

// walls reads the gap to a wall, or between the prongs of a fork.
func (p *microbeam) walls(r *Resolver, support string) {
	wall, prongs := r.X(scale.WallGap), r.c.X(mbProngs)
	closing := 1.0
	switch {
	case !math.IsNaN(prongs) && support != "tuning-fork":
		r.contradict(mbProngs, "Only a tuning fork has prongs that close on each other.")
		return
	case !math.IsNaN(prongs) && !math.IsNaN(wall):
		r.contradict(WallGap, "The gap of a tuning fork is the one between its prongs.")
		return
	case !math.IsNaN(prongs):
		wall, closing = prongs, 2
	case math.IsNaN(wall):
		return
	}
	if !r.Is(group.Fluid) {
		return
	}
	p.near = atMost(wall, p.b)
	r.derive(scale.Gap, wall, units.Length, "to the wall or the other prong")
	r.trait(group.Confined)
	// the mode hardly changes over a width, so that each section is a strip
	p.squeeze = squeeze{side: p.b, aspect: 0, area: p.b, gap: wall, closing: closing}
}

func (p *microbeam) masses(r *Resolver) {
	r.Value(scale.DryMass).Kind = units.MassPerLength
	if !r.take(scale.DryMass, mbMass) {
		r.derive(scale.DryMass, r.X(scale.SolidDensity)*p.b*p.h, units.MassPerLength, "ρ_s b h")
		r.Need(scale.DryMass, mbMass.Path())
		if !math.IsNaN(p.h) {
			r.Need(scale.DryMass, SolidDensity.Path())
		}
	}
	r.displace(r.X(scale.Density)*p.b*p.h, units.MassPerLength, "ρ b h", p.h, mbThickness)
	r.derive(scale.Bending, r.X(scale.Young)*p.b*p.h*p.h*p.h/12, units.BendingStiffnessBeam, "E b h³/12")
	p.released = p.lambda * p.lambda / (2 * math.Pi * p.l * p.l) * math.Sqrt(r.X(scale.Bending)/r.X(scale.DryMass))
}

// loads resolves the added mass: of a strip in open fluid, and nearer to a wall
// than a quarter of its width half of that and the layer in the gap.
func (p *microbeam) loads(r *Resolver) {
	rho := r.X(scale.Density)
	free := rho * math.Pi / 4 * p.b * p.b
	r.derive(scale.AddedMassFree, free, units.MassPerLength, "ρπb²/4 of a strip")
	p.open = free
	added, how := free, "ρπb²/4 of a strip"
	if p.near {
		p.settle(r, p.released)
		p.open = free / 2
		switch {
		case p.gas:
			added, how = free/2+p.trapped(rho), "half of a strip in open fluid, and a third of the gas in the film"
		case p.shell > free/2:
			added, how = free/2+p.shell, "half of a strip in open fluid, and the layer ρb³/12g in the gap"
		default:
			p.shell = free / 2
			how = "ρπb²/4 of a strip, half of it in the gap"
		}
	}
	r.derive(scale.AddedMass, added, units.MassPerLength, how)
	r.addedNeeds(units.MassPerLength)
	r.nearSurface(p.b)
	r.closeGroups()
}

// Groups puts the groups of a microbeam.
func (p *microbeam) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.15, Viscous: 1.15, Acoustic: 1.5, Flow: 2, Buckling: 2, Flutter: 2, Stiffening: clampedStiffening()}
	if p.mode > 3 || p.l < 5*p.b {
		g.Inertia, g.Viscous = 1.5, 1.5
	}
	if p.near || p.h > thinStrip*p.b { // its sides rub too
		g.Inertia, g.Viscous = 1.5, 2
	}
	p.bend(s, g)
	if !g.Is(group.Fluid) {
		return
	}
	g.Traits |= group.ViscousSolved | group.Uniform
	viscousGroups(s, g, p.viscous)
	sprungDamping(s, g)
	p.sound(s, g)
	if g.Is(group.NearSurface) {
		ratio := p.b / s.X(scale.Depth)
		image(g, ratio*ratio/32)
	}
	if !g.Is(group.Liquid) && !s.Has(scale.Gap) {
		putOrWait(s, g, group.Knudsen, meanFreePath(s)/p.b, scale.HeatCapacityRatio, scale.KinematicViscosity, scale.SoundSpeed)
	}
	if s.Has(scale.Gap) {
		p.closingStroke(g)
	}
	p.groups(s, g, p.b)
	quality(s, g)
}

// clampedStiffening is κ of √(1 + κ(ξ/r)²) of a beam whose ends can't move, r
// the radius of gyration.
func clampedStiffening() float64 {
	ratio, err := canon.LargeAmplitude(canon.ImmovableClampedBeam, 1, 1, 0.3)
	if err != nil {
		return 0
	}
	return ratio*ratio - 1
}

// bend puts the groups of the bent shape.
func (p *microbeam) bend(s *scale.Set, g *group.Set) {
	amplitudeOver(s, g, group.DisplacementThickness, p.h/math.Sqrt(12)) // over the radius of gyration
	amplitudeOver(s, g, group.Slope, p.l/p.factors.MaxSlope)
}

// thinStrip is thickness over width up to which a beam is a thin strip: sides of
// a fifth of the width add a few per cent to the friction at S of some ten.
const thinStrip = 0.2

// sound puts Γ of sound, as of a cylinder as wide as the beam. Two prongs at a
// distance s are opposite dipoles in line: of what each would radiate (3/8)(k₀s)²
// is left, the mean of 2 sin²(½k₀s cos φ) cos²φ over that of cos²φ.
func (p *microbeam) sound(s *scale.Set, g *group.Set) {
	x := math.Pi * s.X(scale.FrequencyWet) * p.b / s.X(scale.SoundSpeed)
	soundGroups(s, g, x, func(x float64) (gr, gi float64, err error) {
		gr, gi, err = canon.SoundCylinder(x)
		if distance := (p.gap + p.h) * 2 * x / p.b; p.fork && distance > 0 && p.gap > 0 {
			gi *= math.Min(0.375*distance*distance, 1)
		}
		return gr, gi, err
	})
}
