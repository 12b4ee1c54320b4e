package kind

import (
	"fmt"
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/regime/solid"
	"regimed/units"
)

// squeeze is the fluid in a narrow gap between a face and a wall, or between
// two faces that close on each other.
type squeeze struct {
	side    float64 // a side of the face, L
	aspect  float64 // L over the other side; 0: a strip with L across it
	area    float64 // of the face, in the reference of the dry mass
	gap     float64
	closing float64 // speed at which the gap closes over that of the face: 1, or 2 between two faces
	isFilm  bool
	gas     bool    // a film of gas, which is compressed
	open    float64 // added mass of the side that faces open fluid
	shell   float64 // of the gap, without friction; 0 where it is wide
}

// layer is the added mass of the gap without friction: the pressure of a thin
// layer obeys the same equation as that of a viscous film, with ρ/g in place
// of 12η/g³.
//
//	m_layer = ρ L² A T/(12 g), T = c/(ηL²A/g³) of the liquid film
//
// Symbols: ρ density (kg/m³), L side (m), A area (m²), g gap (m). Range: g ≪ L.
// Accuracy: about g/L. Check: a strip of width b per length: ρb³/(12 g), from
// ½ρ∫(vx/g)² g dx. Source: Batchelor 1967, from memory.
func (q *squeeze) layer(rho float64) float64 {
	t, err := canon.ThinFilmLiquid(q.aspect)
	if err != nil {
		return math.NaN()
	}
	return q.closing * rho * q.side * q.side * q.area * t / (12 * q.gap)
}

// trapped is the added mass of gas that is compressed in the gap: a third of its
// mass, as of any spring that one end drives.
func (q *squeeze) trapped(rho float64) float64 { return q.closing * rho * q.area * q.gap / 3 }

// viscosity is that of the gas in the gap, the effective one where it is rarefied.
func (q *squeeze) viscosity(s *scale.Set) float64 {
	ratio, err := canon.VeijolaViscosity(math.Min(meanFreePath(s)/q.gap, knudsenEnd))
	if err != nil {
		return math.NaN()
	}
	return s.X(scale.Viscosity) * ratio
}

// Knudsen number at which the range of the effective viscosity ends.
const knudsenEnd = 880

// number is the squeeze number at a frequency.
func (q *squeeze) number(s *scale.Set, f float64) float64 {
	return 12 * q.viscosity(s) * 2 * math.Pi * f * q.side * q.side / (s.X(scale.Pressure) * q.gap * q.gap)
}

// force is the stiffness and the damping constant of a film of gas at a
// frequency, in the reference of the dry mass.
func (q *squeeze) force(s *scale.Set, f float64) (spring, damper float64) {
	const end = 1e12 // of the solution: the gas is all spring long before
	k, c, err := canon.ThinFilm(math.Min(q.number(s, f), end), q.aspect)
	if err != nil {
		return math.NaN(), math.NaN()
	}
	stiffest := q.stiffest(s)
	return k * stiffest, c * stiffest / (2 * math.Pi * f)
}

// stiffest is the stiffness of gas that has no time to escape, p A/g.
func (q *squeeze) stiffest(s *scale.Set) float64 {
	return q.closing * s.X(scale.Pressure) * q.area / q.gap
}

// settle decides whether the gap is a film, at a likely frequency or another.
func (q *squeeze) settle(r *Resolver, otherwise float64) {
	q.shell = q.layer(r.X(scale.Density))
	inertia := 2 * math.Pi * r.likelyFrequency(otherwise) * q.gap * q.gap / r.X(scale.KinematicViscosity)
	q.isFilm = isFilm(q.gap, q.side, inertia, !r.Is(group.Liquid))
	q.gas = q.isFilm && r.Is(group.Fluid) && !r.Is(group.Liquid)
	if q.isFilm && r.Is(group.Fluid) {
		r.trait(group.Film)
	}
}

// viscous is Γ of the open side, and with a gap of both together, each with its
// share of the added mass.
func (q *squeeze) viscous(f, nu float64) (gr, gi float64, err error) {
	gr, gi, err = ribbon(2 * math.Pi * f * q.side * q.side / 4 / nu)
	if err != nil || q.gas || q.shell == 0 {
		return gr, gi, err
	}
	lr, li := betweenWalls(q.gap, f, nu)
	share := q.shell / (q.shell + q.open)
	return gr + share*(lr-gr), gi + share*(li-gi), nil
}

// springOver is the stiffness over 4π²m as a function of the frequency, and its
// bound: none but of gas.
func (q *squeeze) springOver(r *Resolver) (spring func(f float64) float64, most float64) {
	if !q.gas {
		return func(float64) float64 { return 0 }, 0
	}
	over := 4 * math.Pi * math.Pi * r.X(scale.DryMass)
	return func(f float64) float64 { k, _ := q.force(r.Set, f); return k / over }, q.stiffest(r.Set) / over
}

// groups puts what the gap does in place of a pressure ρω²ξL.
func (q *squeeze) groups(s *scale.Set, g *group.Set, length float64) {
	if g.Is(group.Liquid) && q.shell != 0 {
		q.suction(s, g, length)
	}
	switch {
	case q.gas:
		q.cushion(s, g)
	case q.isFilm: // a liquid has no spring
		g.Put(group.FluidStiffness, 0)
	}
}

// cushion puts what a film of gas does: its spring and its damper, beside the
// damping that the open side has of its own.
func (q *squeeze) cushion(s *scale.Set, g *group.Set) {
	motion, dry, wet := s.X(scale.FrequencyMotion), s.X(scale.FrequencyDry), s.X(scale.FrequencyWet)
	spring, damper := q.force(s, motion)
	needs := []scale.ID{scale.Viscosity, scale.SoundSpeed, scale.HeatCapacityRatio, scale.FrequencyMotion, scale.DryMass, scale.FrequencyDry, scale.FrequencyWet, scale.Density}
	putOrWait(s, g, group.Squeeze, q.number(s, motion), needs...)
	mass := s.X(scale.DryMass)
	putOrWait(s, g, group.FluidStiffness, spring/(mass*math.Pow(2*math.Pi*dry, 2)), needs...)
	added := s.X(scale.AddedMass) * known(g, group.ViscousInertia)
	open := known(g, group.ViscousDamping) * s.X(scale.AddedMass) * 2 * math.Pi * wet
	g.Drop(group.ViscousDamping) // counted here
	putOrWait(s, g, group.DampingViscous, (damper+open)/(2*(mass+added)*2*math.Pi*wet), needs...)
}

// suction puts the pressure of the oscillation in a gap of liquid: the force of
// the layer over its area, times the peak over the mean, in place of ρω²ξL.
func (q *squeeze) suction(s *scale.Set, g *group.Set, length float64) {
	gr, gi := betweenWalls(q.gap, s.X(scale.FrequencyMotion), s.X(scale.KinematicViscosity))
	peak := squarePeak
	if q.aspect == 0 {
		peak = stripPeak
	}
	factor := peak * q.shell * math.Hypot(gr, gi) / (q.area * s.X(scale.Density) * length)
	switch g.State(group.OscillationPressure) {
	case group.Known, group.Adopted:
		putOrWait(s, g, group.OscillationPressure, factor*g.Get(group.OscillationPressure), scale.KinematicViscosity, scale.FrequencyMotion)
	case group.Missing:
		n := g.Need(group.OscillationPressure)
		n.Coefficient /= math.Pow(factor, 1/n.Power)
		if n.Coefficient > 0 && !math.IsInf(n.Coefficient, 0) {
			g.Miss(group.OscillationPressure, n)
		}
	}
}

// Peak over mean pressure under a strip, of a parabola, and under a square, of
// the flow in a square duct (White 1991, from memory).
const stripPeak, squarePeak = 1.5, 2.096

// closingStroke puts the stroke over the gap where both faces move.
func (q *squeeze) closingStroke(g *group.Set) {
	if q.closing == 1 {
		return
	}
	switch g.State(group.DisplacementGap) {
	case group.Known, group.Adopted:
		g.Put(group.DisplacementGap, q.closing*g.Get(group.DisplacementGap))
	case group.Missing:
		n := g.Need(group.DisplacementGap)
		n.Coefficient /= math.Pow(q.closing, 1/n.Power)
		if !math.IsNaN(n.Coefficient) && !math.IsInf(n.Coefficient, 0) {
			g.Miss(group.DisplacementGap, n)
		}
	}
}

// isFilm says whether a gap is a film: below 15 % of the width, with inertia
// that friction outweighs. A gas is a film to the bound from which on lubrication
// does not count; the friction and the inertia of a liquid, which does not
// compress, are solved together, so that it leaves the film where lubrication ends.
func isFilm(gap, width, inertia float64, gas bool) bool {
	end := float64(filmInertia)
	if !gas {
		end = liquidFilmInertia
	}
	return atMost(gap/width, thinFilm) && !(inertia > end)
}

// liquidFilmInertia is ωg²/ν at which lubrication is out of the question.
const liquidFilmInertia = 1.5

// betweenWalls is Γ of a layer in a gap, 1/(1 − tanh s/s), s = (g/2)√(iω/ν).
func betweenWalls(gap, f, nu float64) (gr, gi float64) {
	x := gap * math.Sqrt(math.Pi*f/(4*nu))
	if !(x > 0) {
		return math.NaN(), math.NaN()
	}
	gamma := gapFactor(x)
	return real(gamma), -imag(gamma)
}

// sprung resolves the frequencies of a structure to which the fluid adds a
// stiffness: f_w² (1 + μΓr) = f² + k_f/(4π²m), the last term by spring as a
// function of f_w, never above most. gamma may be nil.
func (r *Resolver) sprung(derived float64, how string, gamma, spring func(f float64) float64, most float64, needs ...scale.ID) {
	mu := r.X(scale.AddedMass) / r.X(scale.DryMass)
	if gamma == nil {
		gamma = func(float64) float64 { return 1 }
	}
	load := func(f float64) float64 { return f * f * (1 + mu*gamma(f)) }
	r.closeGroups()
	dry := r.c.X(FrequencyDry)
	if math.IsNaN(dry) {
		dry = r.X(scale.FrequencyDry)
	}
	wet := r.c.X(FrequencyWet)
	if math.IsNaN(dry) && !math.IsNaN(wet) {
		square := load(wet) - spring(wet)
		if square <= 0 {
			r.contradict(FrequencyWet, fmt.Sprintf("The fluid alone is stiffer than a wet frequency of %s leaves room for.", units.Format(wet, units.Frequency)))
			return
		}
		dry = math.Sqrt(square)
		r.derive(scale.FrequencyDry, dry, units.Frequency, "from the wet one, less the mass and the stiffness of the fluid")
	}
	if math.IsNaN(dry) {
		dry = derived
	}
	fw := sprungFrequency(dry, wetFrequency(dry, mu, gamma), load, spring, most)
	effective := (dry*dry/(fw*fw) - 1) / mu
	if math.IsInf(effective, 0) { // no mass to carry it
		effective = 0
	}
	r.frequencies(derived, how, func(float64) float64 { return effective })
	if v := r.Value(scale.FrequencyWet); most > 0 && v.Origin == scale.Derived {
		// not from the factor, which has lost the digits of a spring far stiffer than the structure
		v.X = fw
		if m := r.Value(scale.FrequencyMotion); m.Origin == scale.Derived {
			m.X = fw
		}
		v.Note = "√(f² + k_f/(4π²m))/√(1 + μΓr), the mass and the stiffness k_f of the fluid at the wet frequency"
	}
	if r.Has(scale.FrequencyWet) || !r.Has(scale.FrequencyDry) {
		return
	}
	for _, id := range needs {
		if n := r.Needs(id); n != "" && !r.Has(id) {
			r.Need(scale.FrequencyWet, n)
			r.Need(scale.FrequencyMotion, n)
			return
		}
	}
}

// sprungFrequency solves load(f) − spring(f) = dry² by halving between the
// frequency without the spring and that of the greatest spring without the mass.
func sprungFrequency(dry, low float64, load, spring func(f float64) float64, most float64) float64 {
	high := math.Sqrt(dry*dry + most)
	if math.IsNaN(low) || !(high >= low) || math.IsInf(high, 1) || math.IsNaN(spring(low)) {
		return math.NaN()
	}
	lo, hi := math.Log(low), math.Log(high)
	for range 60 {
		middle := (lo + hi) / 2
		f := math.Exp(middle)
		if load(f)-spring(f) < dry*dry {
			lo = middle
		} else {
			hi = middle
		}
		if hi-lo < 1e-14 {
			break
		}
	}
	return math.Exp((lo + hi) / 2)
}

// sprungDamping puts the structural damping ratio of the wet oscillator, whose
// stiffness is not that of the structure alone: ζ (f/f_w)/(1 + μΓr).
func sprungDamping(s *scale.Set, g *group.Set) {
	if !g.Has(group.DampingRatio) {
		return
	}
	inertia := 1 + s.X(scale.AddedMass)*known(g, group.ViscousInertia)/s.X(scale.DryMass)
	g.Put(group.DampingRatio, s.X(scale.Damping)*s.X(scale.FrequencyDry)/(s.X(scale.FrequencyWet)*inertia))
}

// The fields of a film.
var (
	fmLength    = quantity("length", units.Length, "gt=0", "side of a rectangular plate", "")
	fmWidth     = quantity("width", units.Length, "gt=0", "other side of a rectangular plate", "")
	fmRadius    = quantity("radius", units.Length, "gt=0", "radius of a round plate or rotor, in place of length and width", "")
	fmGap       = quantity("gap", units.Length, "gt=0", "gap to the wall at rest; surroundings.wall_gap is the same", "")
	fmMass      = quantity("moving_mass", units.Mass, "gt=0", "dry mass that moves", "density times area and thickness")
	fmThickness = quantity("thickness", units.Length, "gt=0", "thickness of the plate", "")
	fmStiffness = quantity("stiffness", units.Stiffness, "gt=0", "stiffness of the suspension, in place of a frequency", "")
	fmStroke    = quantity("stroke", units.Length, "gte=0", "amplitude of the motion, in place of motion.amplitude", "")
	fmOpen      = flag("open_back", "whether the other side faces open fluid", "true")
)

// Film is a rigid plate that moves towards a wall.
var Film = &Kind{
	Name:   "film",
	Title:  "Plate over a film",
	Doc:    "a rigid plate or rotor on a suspension that moves towards a wall, over a film of gas or liquid much thinner than it is wide",
	Fields: modal(fmLength, fmWidth, fmRadius, fmGap, fmMass, fmThickness, fmStiffness, fmStroke, fmOpen, MaterialName, SolidDensity),
	New:    newFilm,
}

// film holds the solved problem of a plate over a film.
type film struct {
	squeeze
	a, b  float64 // sides
	round bool
}

func newFilm(r *Resolver) Physics {
	p := &film{}
	if !p.shape(r) {
		return p
	}
	r.stroke(fmStroke)
	r.closeGroups()
	r.damping()
	p.masses(r)
	p.loads(r)
	derived := r.suspension(fmStiffness)
	spring, most := p.springOver(r)
	r.sprung(derived, "√(k/m)/2π", r.gamma(p.viscous), spring, most, scale.DryMass, scale.AddedMass, scale.Density, scale.Viscosity, scale.SoundSpeed, scale.HeatCapacityRatio)
	r.interestOf()
	return p
}

// suspension takes the stiffness of a suspension and returns the frequency that
// follows, NaN without.
func (r *Resolver) suspension(f *input.Field) float64 {
	if !r.take(scale.Stiffness, f) {
		return math.NaN()
	}
	return math.Sqrt(r.X(scale.Stiffness)/r.X(scale.DryMass)) / (2 * math.Pi)
}

// stroke takes the amplitude from a field of the kind.
func (r *Resolver) stroke(f *input.Field) {
	if !r.c.Has(f) {
		return
	}
	x := r.c.X(f)
	if r.c.Has(MotionAmplitude) && math.Abs(r.c.X(MotionAmplitude)-x) > 0.01*x {
		r.contradict(f, fmt.Sprintf("%s and %s are the same and disagree.", f.Path(), MotionAmplitude.Path()))
	}
	r.take(scale.Amplitude, f)
	r.trait(group.Amplitude)
}

func (p *film) shape(r *Resolver) bool {
	p.a, p.b = r.c.X(fmLength), r.c.X(fmWidth)
	radius := r.c.X(fmRadius)
	switch {
	case !math.IsNaN(radius) && (r.c.Has(fmLength) || r.c.Has(fmWidth)):
		r.contradict(fmRadius, "A plate has a radius, or length and width.")
		return false
	case !math.IsNaN(radius):
		// the film of a disc is that of the square of its area, within an eighth:
		// 0.4217π² = 4.16 against 3π/2 = 4.71 in ηa⁴/g³ of a liquid
		p.round, p.a = true, radius*math.Sqrt(math.Pi)
		p.b = p.a
		r.Put(scale.Length, radius, units.Length, scale.Given, "the radius")
	case math.IsNaN(p.a) || math.IsNaN(p.b):
		for _, f := range []*input.Field{fmLength, fmWidth} {
			if !r.c.Has(f) {
				r.violations.Add(f.Pointer(), input.MissingField, "A plate over a film needs length and width, or a radius.", nil)
			}
		}
		return false
	default:
		r.derive(scale.Length, math.Min(p.a, p.b), units.Length, "the shorter side")
	}
	gap := r.c.X(fmGap)
	switch wall := r.X(scale.WallGap); {
	case math.IsNaN(gap) && math.IsNaN(wall):
		r.violations.Add(fmGap.Pointer(), input.MissingField, "A film needs the gap to the wall.", nil)
		return false
	case math.IsNaN(gap):
		gap = wall
	case !math.IsNaN(wall) && math.Abs(wall/gap-1) > 1e-6:
		r.contradict(fmGap, fmt.Sprintf("%s and %s are the same and disagree.", fmGap.Path(), WallGap.Path()))
		return false
	}
	r.Put(scale.Gap, gap, units.Length, scale.Given, "to the wall")
	short, long := math.Min(p.a, p.b), math.Max(p.a, p.b)
	p.squeeze = squeeze{side: short, aspect: short / long, area: p.a * p.b, gap: gap, closing: 1}
	if !atMost(gap, math.Min(p.a, p.b)) {
		r.contradict(fmGap, "The gap is wider than the plate: that is no film. Use another kind.")
		return false
	}
	return true
}

func (p *film) masses(r *Resolver) {
	r.takeOrNeed(scale.Thickness, fmThickness)
	solidDensity(r)
	h, area := r.X(scale.Thickness), p.area
	r.Value(scale.DryMass).Kind = units.Mass
	if !r.take(scale.DryMass, fmMass) {
		r.derive(scale.DryMass, r.X(scale.SolidDensity)*area*h, units.Mass, "ρ_s times area and thickness")
		r.Need(scale.DryMass, fmMass.Path())
	}
	r.displace(r.X(scale.Density)*area*h, units.Mass, "ρ times area and thickness", h, fmThickness)
	r.closeGroups()
}

// solidDensity takes the density of a rigid solid, or looks it up.
func solidDensity(r *Resolver) {
	m := solid.Find(r.c.Choice(MaterialName, ""))
	if !r.take(scale.SolidDensity, SolidDensity) && m != nil {
		r.Put(scale.SolidDensity, m.Density, units.Density, scale.LookedUp, "typical of "+m.Title)
	}
	r.takeOrNeed(scale.SolidDensity, SolidDensity)
	r.plausibleSolid()
}

// loads resolves the added masses: half of that of the plate in open fluid on
// its back, and the layer in the gap where it is no film.
func (p *film) loads(r *Resolver) {
	rho := r.X(scale.Density)
	whole := heavingPlate(p.a, p.b) * rho
	if radius := r.X(scale.Length); p.round {
		whole = 8. / 3 * rho * radius * radius * radius
	}
	if r.c.Flag(fmOpen, true) {
		p.open = whole / 2
	}
	if !r.c.Has(fmOpen) && r.Is(group.Fluid) {
		r.warn(fmOpen, "assumed", "The other side of the plate is taken to face open fluid.")
	}
	p.settle(r, p.suspended(r))
	added, how := p.open+p.shell, "the layer in the gap, and half of that in open fluid on an open back"
	if p.gas {
		added, how = p.open+p.trapped(rho), "a third of the gas in the film, and half of that in open fluid on an open back"
	}
	if r.Is(group.Fluid) {
		r.trait(group.Confined)
	}
	r.derive(scale.AddedMassFree, whole, units.Mass, "a rigid plate in open fluid")
	r.derive(scale.AddedMass, added, units.Mass, how)
	r.addedNeeds(units.Mass)
	r.derive(scale.ViscousLength, p.gap, units.Length, "the gap")
	r.nearSurface(r.X(scale.Length))
	r.closeGroups()
}

// suspended is the frequency on the suspension, NaN where it is not known.
func (p *film) suspended(r *Resolver) float64 {
	return math.Sqrt(r.c.X(fmStiffness)/r.X(scale.DryMass)) / (2 * math.Pi)
}

// likelyFrequency is the frequency of the motion, the dry or the wet one, the
// first that is given, or another.
func (r *Resolver) likelyFrequency(otherwise float64) float64 {
	for _, f := range []*input.Field{MotionFrequency, FrequencyDry, FrequencyWet} {
		if r.c.Has(f) {
			return r.c.X(f)
		}
	}
	return otherwise
}

// heavingPlate is the added mass over the density of a rectangular plate that
// moves across its plane in open fluid.
//
//	m/ρ = (π/4) b² a K, K = λ/√(1 + λ²) (1 − 0.425 λ/(1 + λ²)), λ = a/b
//
// Symbols: a, b sides (m). Range: any ratio. Accuracy: 5 %. Check: a square:
// K = 0.557, the exact solution 0.579; a strip: K = 1. Source: Pabst 1930, from
// memory of its citation in Blevins 1990.
func heavingPlate(a, b float64) float64 {
	b, a = math.Min(a, b), math.Max(a, b)
	l := a / b
	k := l / math.Hypot(1, l) * (1 - 0.425/(1/l+l))
	return math.Pi / 4 * b * b * a * k
}

// Groups puts the groups of a film.
func (p *film) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.5, Viscous: 1.3, Acoustic: 2, Flow: 2, Buckling: 2, Flutter: 2}
	if !g.Is(group.Fluid) || p.gap == 0 {
		return
	}
	g.Traits |= group.ViscousSolved
	viscousGroups(s, g, p.viscous)
	sprungDamping(s, g)
	p.sound(s, g)
	if g.Is(group.NearSurface) {
		// the image of the dipole of a disc, (a/d)³/6π
		image(g, math.Pow(p.side/2/s.X(scale.Depth), 3)/(6*math.Pi))
	}
	p.groups(s, g, s.X(scale.Length))
	quality(s, g)
}

// sound puts Γ of sound: along the layer of the gap, which is a quarter of a
// wave long at k₀L/2 = π/2, by (tan q/q − 1)·3/q²; it is no more than ten times
// that of an incompressible fluid, where the gap resonates.
func (p *film) sound(s *scale.Set, g *group.Set) {
	q := math.Pi * s.X(scale.FrequencyWet) * math.Min(p.a, p.b) / s.X(scale.SoundSpeed)
	soundGroups(s, g, q, func(q float64) (gr, gi float64, err error) {
		gr, gi, err = canon.SoundSphere(dipoleOfDisc * q)
		if p.gas {
			return gr, gi, err
		}
		share := p.shell / (p.shell + p.open)
		return gr + share*(layerSound(q)-gr), gi * (1 - share), err
	})
}

func layerSound(q float64) float64 {
	const most = 10
	if q < 1e-3 {
		return 1 + 0.4*q*q
	}
	x := math.Tan(q)/q - 1
	if q > 1.5 || 3*x/(q*q) > most {
		return most
	}
	return 3 * x / (q * q)
}
