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

// The fields of a floater.
var (
	floShape     = choice("shape", "shape of the wetted body", "vertical-cylinder", "vertical-cylinder", "horizontal-cylinder", "sphere", "box")
	floDiameter  = quantity("diameter", units.Length, "gt=0", "diameter of a cylinder or a sphere", "")
	floRadius    = quantity("radius", units.Length, "gt=0", "radius of a cylinder or a sphere, in place of the diameter", "")
	floLength    = quantity("length", units.Length, "gt=0", "length of a box along the waves, or of a horizontal cylinder across them", "")
	floWidth     = quantity("width", units.Length, "gt=0", "width of a box across the waves", "the length")
	floDraft     = quantity("draft", units.Length, "gt=0", "depth of the keel below the still surface", "from the mass of a body that floats; the depth of the water for a fixed one")
	floMass      = quantity("mass", units.Mass, "gt=0", "dry mass with what it carries", "the displaced mass of a body that floats")
	floVolume    = quantity("volume", units.Volume, "gt=0", "displaced volume", "by shape and draft")
	floWaterline = quantity("waterplane_area", units.Area, "gte=0", "area of the waterplane", "by shape and draft")
	floAdded     = pure("added_mass_coefficient", "gte=0", "added mass of heave over displaced mass", "by shape")
	floFixed     = flag("fixed", "whether the body stands on the bed or on piles and does not float", "false")
	floRestoring = quantity("restoring_stiffness", units.Stiffness, "gt=0", "stiffness of heave", "ρg times the waterplane area")
	floMooring   = quantity("mooring_stiffness", units.Stiffness, "gt=0", "horizontal stiffness of the mooring", "free to drift")
	floHeave     = quantity("natural_period_heave", units.Time, "gt=0", "natural period of heave in the water", "from stiffness and mass")
	floPitch     = quantity("natural_period_pitch", units.Time, "gt=0", "natural period of pitch in the water", "not considered")
	floDrag      = pure("drag_coefficient", "gt=0", "drag coefficient on the frontal area", "by shape and Reynolds number")
	floStrouhal  = pure("strouhal", "gt=0,lt=1", "Strouhal number", "by shape and Reynolds number")
	floLift      = pure("lift_coefficient", "gt=0", "r.m.s. unsteady lift coefficient", "0.3; 0.06 of a sphere")
)

// Floater is a fixed or floating body at the surface.
var Floater = &Kind{
	Name:  "floater",
	Title: "Body at the surface",
	Doc:   "fixed or floating rigid body that pierces the surface: buoy, spar, barge, pontoon, caisson, in waves, in a current or at rest",
	Fields: modal(floShape, floDiameter, floRadius, floLength, floWidth, floDraft, floMass, floVolume, floWaterline, floAdded, floFixed,
		floRestoring, floMooring, floHeave, floPitch, floDrag, floStrouhal, floLift),
	Directions: []string{"cross"},
	Waves:      true,
	Surface:    true,
	New:        newFloater,
}

// floater holds the solved problems of one body.
type floater struct {
	shape       string
	fixed       bool
	l, b, d     float64 // along the waves, across them, and the height of a round body (NaN: none)
	draft       float64
	volume      float64
	waterplane  float64
	frontal     float64
	heave       float64 // added mass coefficients, on the displaced mass
	surge       float64
	massRatio   float64
	sea         sea
	wake        wake
	lockIn      float64 // frequency at which shedding could lock in
	dragInertia float64
}

func newFloater(r *Resolver) Physics {
	b := &floater{shape: r.c.Choice(floShape, "vertical-cylinder"), fixed: r.c.Flag(floFixed, false), massRatio: math.NaN(), dragInertia: math.NaN(), lockIn: math.NaN(), d: math.NaN()}
	if !b.size(r) || !b.immersion(r) {
		return b
	}
	if r.Is(group.Gas) {
		r.contradict(FluidPhase, "A floater stands in a liquid, and the fluid is a gas.")
		return b
	}
	r.trait(group.NearSurface | group.Bluff)
	if r.Is(group.Fluid) {
		r.trait(group.Piercing)
	}
	r.liquid()
	r.unused(WallGap, ShellDiameter, DepthBelowSurface, BackingDepth)
	if b.round() {
		r.trait(group.Circular)
	}
	r.derive(scale.Depth, b.draft, units.Length, "the draft")
	r.closeGroups()
	r.damping()
	b.masses(r)
	b.frequencies(r)
	r.interestOf()
	if r.Is(group.Cross) {
		b.current(r)
	}
	if r.Is(group.Waves) {
		b.inWaves(r)
	}
	return b
}

// round reports whether the body is a circle to a horizontal flow.
func (b *floater) round() bool { return b.shape == "vertical-cylinder" || b.shape == "sphere" }

// size takes the dimensions of the shape.
func (b *floater) size(r *Resolver) bool {
	d, radius := r.c.X(floDiameter), r.c.X(floRadius)
	if math.IsNaN(d) {
		d = 2 * radius
	} else if !math.IsNaN(radius) && math.Abs(2*radius/d-1) > 1e-3 {
		r.contradict(floRadius, "The radius is not half the diameter.")
	}
	if b.shape == "box" {
		b.l, b.b = r.c.X(floLength), r.c.X(floWidth)
		if math.IsNaN(b.l) {
			r.violations.Add(floLength.Pointer(), input.MissingField, "A box needs its length along the waves.", nil)
			return false
		}
		if math.IsNaN(b.b) {
			b.b = b.l
			r.warn(floWidth, "assumed", "The box is taken as wide as it is long.")
		}
	} else {
		if math.IsNaN(d) {
			r.violations.Add(floDiameter.Pointer(), input.MissingField, "A "+b.shape+" needs a diameter (or a radius).", nil)
			return false
		}
		b.l, b.b = d, d
		if b.shape != "vertical-cylinder" {
			b.d = d
		}
		if b.shape == "horizontal-cylinder" {
			if b.b = r.c.X(floLength); math.IsNaN(b.b) {
				r.violations.Add(floLength.Pointer(), input.MissingField, "A horizontal cylinder needs its length.", nil)
				return false
			}
		}
	}
	if !r.c.Has(floShape) {
		r.warn(floShape, "assumed", "The body is taken as a vertical cylinder.")
	}
	r.Put(scale.Length, b.l, units.Length, scale.Given, "the length along the waves, or the diameter")
	r.Put(scale.Width, b.b, units.Length, scale.Given, "the width across the waves")
	r.derive(scale.ViscousLength, b.l/2, units.Length, "half the length")
	r.derive(scale.SemiChord, b.l/2, units.Length, "half the length")
	return true
}

// immersion finds draft, volume, waterplane and frontal area.
func (b *floater) immersion(r *Resolver) bool {
	b.draft = r.c.X(floDraft)
	depth := r.X(scale.WaterDepth)
	if math.IsNaN(b.draft) {
		switch {
		case b.fixed && !math.IsNaN(depth) && math.IsNaN(b.d):
			b.draft = depth
		case !b.fixed && math.IsNaN(b.d):
			b.draft = r.c.X(floMass) / (r.X(scale.Density) * b.area(0))
		}
		if math.IsNaN(b.draft) && !math.IsNaN(b.d) {
			b.draft = b.d / 2
			r.warn(floDraft, "assumed", "The body is taken as half immersed.")
		}
	}
	if !(b.draft > 0) || math.IsInf(b.draft, 1) {
		r.violations.Add(floDraft.Pointer(), input.MissingField, "A floater needs its draft, or, floating, its mass and the density of the fluid.", nil)
		return false
	}
	if b.draft > b.d*(1+1e-9) {
		r.contradict(floDraft, "The draft is larger than the diameter: the body does not pierce the surface.")
		return false
	}
	if b.draft > depth*(1+1e-9) {
		r.contradict(floDraft, "The draft is larger than the depth of the water.")
		return false
	}
	b.waterplane, b.volume, b.frontal = b.area(b.draft), b.immersed(b.draft), b.front(b.draft)
	if v := r.c.Lookup(floWaterline); v != nil {
		b.waterplane = v.Q.Value
	}
	if v := r.c.Lookup(floVolume); v != nil {
		b.volume = v.Q.Value
	}
	return true
}

// area is that of the waterplane at a draft.
func (b *floater) area(draft float64) float64 {
	half := math.Sqrt(math.Max(draft*(b.d-draft), 0))
	switch b.shape {
	case "box":
		return b.l * b.b
	case "sphere":
		return math.Pi * half * half
	case "horizontal-cylinder":
		return 2 * half * b.b
	default:
		return math.Pi * b.l * b.l / 4
	}
}

// immersed is the displaced volume at a draft.
func (b *floater) immersed(draft float64) float64 {
	switch b.shape {
	case "sphere":
		return math.Pi * draft * draft * (1.5*b.d - draft) / 3
	case "horizontal-cylinder":
		return b.segment(draft) * b.b
	default:
		return b.area(draft) * draft
	}
}

// front is the frontal area across the waves at a draft.
func (b *floater) front(draft float64) float64 {
	if b.shape == "sphere" {
		return b.segment(draft)
	}
	return b.b * draft
}

// segment is the area of a circle below a chord.
func (b *floater) segment(draft float64) float64 {
	a := b.d / 2
	return math.Max(0, a*a*math.Acos(math.Max(-1, math.Min(1, 1-draft/a)))-(a-draft)*math.Sqrt(math.Max(draft*(b.d-draft), 0)))
}

// plateAdded are the added masses of a rectangular plate that moves broadside,
// over ρπ a²b/4, a the shorter side, at ratios b/a (DNV-RP-C205, appendix D, from
// memory; 1 for an endless strip).
var plateAdded = [][2]float64{{1, 0.579}, {1.25, 0.642}, {1.5, 0.690}, {2, 0.757}, {2.5, 0.801}, {3, 0.830}, {4, 0.872}, {5, 0.897}, {6.25, 0.917}, {8, 0.934}, {10, 0.947}}

// broadside is the added mass of a rectangular plate over the density, both
// sides wet.
//
//	C(b/a) π a² b/4
//
// Symbols: a, b shorter and longer side [m]; the result in m³. Range: any ratio;
// beyond 10 the strip is approached as a/b. Accuracy: 1 % of the tables.
// Check: a square of 1 m: 0.4547. Source: DNV-RP-C205, appendix D, from memory.
func broadside(p, q float64) float64 {
	a, b := math.Min(p, q), math.Max(p, q)
	ratio, c := b/a, 0.0
	last := plateAdded[len(plateAdded)-1]
	switch {
	case ratio >= last[0]:
		c = 1 - (1-last[1])*last[0]/ratio
	default:
		for i := 1; i < len(plateAdded); i++ {
			if lo, hi := plateAdded[i-1], plateAdded[i]; ratio <= hi[0] {
				c = lo[1] + (hi[1]-lo[1])*(ratio-lo[0])/(hi[0]-lo[0])
				break
			}
		}
	}
	return c * math.Pi * a * a * b / 4
}

// heaveMass is the added mass of heave over the density, by shape: half of a disc
// or a plate, for the side that is wet; half the displaced mass of a sphere; all
// of it for a half immersed cylinder, whose image makes it a circle. These are the
// limits of short periods; waves change them by some tens of per cent (Newman
// 1977, from memory).
func (b *floater) heaveMass() (volume float64, how string) {
	switch b.shape {
	case "box":
		return broadside(b.l, b.b) / 2, "half that of a rectangular plate"
	case "sphere":
		return b.volume / 2, "half the displaced mass, of a sphere"
	case "horizontal-cylinder":
		return b.volume, "the displaced mass, of a half immersed cylinder"
	default:
		return 4.0 / 3 * math.Pow(b.l/2, 3), "half that of a disc, (4/3)ρa³"
	}
}

func (b *floater) masses(r *Resolver) {
	rho := r.X(scale.Density)
	r.derive(scale.DisplacedMass, rho*b.volume, units.Mass, "ρ times the displaced volume")
	r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	r.Value(scale.DryMass).Kind = units.Mass
	if !r.take(scale.DryMass, floMass) {
		if r.closeGroups(); !r.Has(scale.DryMass) && !b.fixed {
			r.derive(scale.DryMass, rho*b.volume, units.Mass, "the displaced mass: it floats")
		}
		r.Need(scale.DryMass, floMass.Path())
	}
	if ratio := r.X(scale.DryMass) / r.X(scale.DisplacedMass); !math.IsInf(ratio, 0) {
		b.massRatio = ratio
	}
	if !b.fixed && (b.massRatio > 1.1 || b.massRatio < 0.9) {
		r.warn(floMass, "weight-differs", fmt.Sprintf("The body weighs %.3g of the water that it displaces: it floats at another draft, or a tether or a mooring carries the difference.", b.massRatio))
	}
	added, how := b.heaveMass()
	b.heave = added / b.volume
	if v := r.c.Lookup(floAdded); v != nil {
		b.heave, how = v.Q.Value, "the coefficient given times the displaced mass"
	}
	b.surge = 1
	if b.shape == "sphere" {
		b.surge = 0.5
	}
	if b.fixed {
		b.heave, how = b.surge, "the displaced mass, of a body that moves sideways"
	}
	r.derive(scale.AddedMass, b.heave*rho*b.volume, units.Mass, how)
	r.derive(scale.AddedMassFree, b.heave*rho*b.volume, units.Mass, how)
	r.addedNeeds(units.Mass)
}

// frequencies resolves the frequency of heave, or of the structure that holds a
// fixed body; and those of pitch and of surge.
func (b *floater) frequencies(r *Resolver) {
	derived, how := b.heaveFrequency(r)
	r.frequencies(derived, how, nil)
	if b.fixed {
		b.lockIn = r.X(scale.FrequencyWet)
		return
	}
	r.derive(scale.FrequencyPitch, 1/r.c.X(floPitch), units.Frequency, "one over the period of pitch")
	if k := r.c.X(floMooring); !math.IsNaN(k) {
		wet := r.X(scale.DryMass) + b.surge*r.X(scale.DisplacedMass)
		r.derive(scale.FrequencySurge, math.Sqrt(k/wet)/(2*math.Pi), units.Frequency, "√(k/(m + m_a)) of the mooring")
		b.lockIn = r.X(scale.FrequencySurge)
	}
}

// heaveFrequency is the dry frequency that belongs to the period of heave, or
// that of the stiffness of heave; NaN where neither is known.
func (b *floater) heaveFrequency(r *Resolver) (float64, string) {
	mu := r.X(scale.AddedMass) / r.X(scale.DryMass)
	if period := r.c.X(floHeave); !math.IsNaN(period) {
		if b.fixed {
			r.contradict(floHeave, "A fixed body does not heave.")
		}
		if f := r.c.X(FrequencyWet); math.Abs(f*period-1) > 0.01 {
			r.contradict(floHeave, "The period of heave is not one over the wet frequency.")
		}
		return math.Sqrt(1+mu) / period, "√(1 + μ) over the period of heave"
	}
	stiffness := r.c.X(floRestoring)
	if math.IsNaN(stiffness) {
		if b.fixed {
			return math.NaN(), ""
		}
		stiffness = r.X(scale.Density) * r.X(scale.Gravity) * b.waterplane
	}
	r.derive(scale.Stiffness, stiffness, units.Stiffness, "ρg times the waterplane, or as given")
	f := math.Sqrt(stiffness/r.X(scale.DryMass)) / (2 * math.Pi)
	if !(f > 0) {
		return math.NaN(), ""
	}
	return f, "√(k/m)/2π of the stiffness of heave"
}

// dragCoefficient by shape: circles by Reynolds number.
func (b *floater) dragCoefficient(r *Resolver, u float64) float64 {
	switch {
	case r.c.Has(floDrag):
		return r.c.X(floDrag)
	case b.shape == "box":
		return bluffDrag
	case b.shape == "sphere":
		return dragByShape["sphere"]
	default:
		return (&wake{shape: canon.SectionCircle, drag: math.NaN()}).dragCoefficient(math.Max(r.reynoldsAt(u), lowestReynolds))
	}
}

// current solves the current across: drag on the mooring, and the wake, which
// could lock to the sway of a moored body or to the mode of a fixed one.
func (b *floater) current(r *Resolver) {
	shape, lift := canon.SectionCircle, defaultLift
	if b.shape == "box" || b.shape == "sphere" {
		shape, lift = canon.SectionBluff, liftByShape(b.shape)
	}
	u := r.X(scale.Speed)
	drag := b.dragCoefficient(r, u)
	b.wake = wake{shape: shape, strouhal: r.c.X(floStrouhal), drag: drag, lift: lift, modeFactor: canon.ModeFactorSpringMounted, modes: []float64{1}, first: 1}
	if v := r.c.Lookup(floLift); v != nil {
		b.wake.lift = v.Q.Value
	} else {
		r.warn(floLift, "assumed", "The r.m.s. lift coefficient of shedding is taken by shape: "+units.Format(lift, units.Dimensionless)+".")
	}
	sway := *r
	sway.Set = r.With(scale.FrequencyWet, b.lockIn)
	b.wake.solve(&sway, b.massRatio, b.surge, math.Pi/4)
	b.wake.amplify(&sway, b.massRatio, b.surge)
	load := drag * r.X(scale.Density) * u * u / 2 * b.frontal
	if b.fixed {
		r.deflect(load, 1, units.Force)
		return
	}
	r.derive(scale.DragPerLength, load, units.Force, "½ρU² C_D and the frontal area")
	r.Value(scale.StaticDeflection).Kind = units.Length
	r.derive(scale.StaticDeflection, load/r.c.X(floMooring), units.Length, "the drag over the stiffness of the mooring")
	r.Need(scale.StaticDeflection, floMooring.Path())
}

// inWaves solves the load and the motion in waves, long against the body.
func (b *floater) inWaves(r *Resolver) {
	b.sea = seaOf(r.Set)
	u := b.sea.speed()
	r.derive(scale.ParticleSpeed, u, units.Speed, "aω coth kd, at the still surface")
	current := 0.0
	if r.Is(group.Cross) {
		current = r.X(scale.Speed)
	}
	speed := current + u
	drag := b.dragCoefficient(r, speed) / 2 * b.frontal * speed * speed
	inertia := (1 + b.surge) * b.volume * b.sea.omega * u
	b.dragInertia = dragOver(drag, inertia)
	rho := r.X(scale.Density)
	load := rho * morison(drag, inertia)
	r.derive(scale.WaveLoad, load, units.Force, "Morison's equation with the kinematics at the surface over the draft")
	if b.fixed {
		omega := 2 * math.Pi * r.X(scale.FrequencyDry)
		r.movedByWaves(load/(r.X(scale.DryMass)*omega*omega)*r.magnifiedAt(r.X(scale.FrequencyWet)), "the wave load over mω², with dynamic magnification")
		return
	}
	r.movedByWaves(math.Max(b.heaving(r), b.surging(r, rho*inertia)), "the larger of heave and surge in long waves")
}

// heaving is the amplitude of heave, from the pressure of the wave at the keel,
// averaged over the length, and the added mass in the water's acceleration.
//
//	ξ = a e^(−kT) |ρgA_w sin(kL/2)/(kL/2) − ω² m_a|/k_h × magnification
//
// Symbols: a wave amplitude, k wave number, T draft, A_w waterplane, L length along
// the waves, m_a added mass, k_h stiffness of heave. Range: D/λ up to about 0.2; beyond
// it an order of magnitude. Accuracy: 20 %. Check: long waves: ξ = a.
// Source: Newman 1977, ch. 6, from memory.
func (b *floater) heaving(r *Resolver) float64 {
	half := b.sea.k * b.l / 2
	average := 1.0
	if half > 0 {
		average = math.Sin(half) / half
	}
	k := r.X(scale.Density) * r.X(scale.Gravity) * b.waterplane
	force := b.sea.a * math.Exp(-b.sea.k*b.draft) * math.Abs(k*average-b.sea.omega*b.sea.omega*r.X(scale.AddedMass))
	omega := 2 * math.Pi * r.X(scale.FrequencyDry)
	return force / (r.X(scale.DryMass) * omega * omega) * r.magnifiedAt(r.X(scale.FrequencyWet))
}

// surging is the amplitude of surge under the inertia force of the wave, free or
// on the mooring.
func (b *floater) surging(r *Resolver, inertia float64) float64 {
	wet := r.X(scale.DryMass) + b.surge*r.X(scale.DisplacedMass)
	free := inertia / (wet * b.sea.omega * b.sea.omega)
	f := r.X(scale.FrequencySurge)
	if math.IsNaN(f) {
		return free
	}
	ratio := f / r.X(scale.FrequencyWave)
	return free * r.magnifiedAt(f) / (ratio * ratio)
}

// Groups puts the groups that are the body's own.
func (b *floater) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.5, Viscous: 2, Acoustic: 2, Flow: 2, Buckling: 1.5, Flutter: 1.5, StallPerRadian: 1}
	g.Band = group.Transition{Low: 190, High: 300, Length: group.Reynolds}
	if !g.Is(group.Fluid) {
		return
	}
	b.still(s, g)
	g.Put(group.ModeCoupling, 1)
	if mu := math.Max(b.heave, b.surge) / b.massRatio; !math.IsNaN(mu) {
		g.Put(group.AddedMassSoftest, mu)
	}
	if g.Is(group.Cross) {
		b.flowGroups(s, g)
	}
	if g.Is(group.Waves) {
		b.sea.groups(s, g, b.l)
		putOrWait(s, g, group.DragInertia, b.dragInertia, scale.WaveHeight, scale.FrequencyWave, scale.Speed, scale.KinematicViscosity)
		putRatio(s, g, group.WaveRatioPitch, scale.FrequencyPitch)
		putRatio(s, g, group.WaveRatioSurge, scale.FrequencySurge)
		b.diffract(s, g)
	}
}

// putRatio puts the frequency of the waves over another one.
func putRatio(s *scale.Set, g *group.Set, id group.ID, f scale.ID) {
	if s.Has(f) {
		putOrWait(s, g, id, s.X(scale.FrequencyWave)/s.X(f), scale.FrequencyWave)
	}
}

// diffract puts the inertia coefficient of a caisson that reaches the bed.
func (b *floater) diffract(s *scale.Set, g *group.Set) {
	if b.shape != "vertical-cylinder" || !b.fixed || b.draft < 0.9*b.sea.d {
		return
	}
	if cm, _, err := canon.CylinderDiffraction(b.sea.k * b.l / 2); err == nil {
		putOrWait(s, g, group.DiffractionInertia, cm/2, scale.FrequencyWave)
	}
}

// still puts the factors of oscillation, by the circular cylinder and the sphere
// as cousins.
func (b *floater) still(s *scale.Set, g *group.Set) {
	fw, nu := s.X(scale.FrequencyWet), s.X(scale.KinematicViscosity)
	stokes, ka := math.Pi*fw*b.l*b.l/2/nu, math.Pi*fw*b.l/s.X(scale.SoundSpeed)
	viscous, sound := canon.OscillatingCylinder, canon.SoundCylinder
	if b.shape == "sphere" {
		viscous, sound = sphereViscous, canon.SoundSphere
	}
	put := func(x float64, solve func(float64) (float64, float64, error), inertia, damping group.ID, needs ...scale.ID) {
		if gr, gi, err := solve(x); err == nil && !math.IsNaN(gr) {
			g.Put(inertia, gr)
			g.Put(damping, gi)
			return
		}
		waitFor(s, g, needs, inertia, damping)
	}
	put(stokes, viscous, group.ViscousInertia, group.ViscousDamping, scale.FrequencyWet, scale.KinematicViscosity)
	put(ka, sound, group.AcousticInertia, group.AcousticDamping, scale.FrequencyWet, scale.SoundSpeed)
	g.Drop(group.Knudsen)
	if !g.Is(group.Waves) {
		if x := s.X(scale.Amplitude); !math.IsNaN(x) {
			g.Put(group.KeuleganCarpenter, 2*math.Pi*x/b.l)
		} else {
			g.Miss(group.KeuleganCarpenter, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: b.l / (2 * math.Pi), Power: 1})
		}
	}
}

// sphereViscous is Γ of a sphere per its ideal added mass.
func sphereViscous(s float64) (gr, gi float64, err error) {
	added, damping, err := canon.OscillatingSphere(s)
	return 2 * added, 2 * damping, err
}

// flowGroups puts what a current makes.
func (b *floater) flowGroups(s *scale.Set, g *group.Set) {
	b.wake.groups(s.With(scale.FrequencyWet, b.lockIn), g)
	if math.IsNaN(b.lockIn) && !b.fixed {
		need := group.Need{Input: floMooring.Path(), Unit: "N/m"}
		g.Miss(group.LockInPosition, need)
		g.Miss(group.SheddingRatio, need)
	}
	g.Drop(group.ReducedFrequency)
	g.Put(group.FlowStiffness, 0) // a stream is the same wherever the body is
	if !math.IsNaN(b.wake.drag) {
		g.Put(group.DragCoefficient, b.wake.drag)
	}
	g.Put(group.SpanRatio, b.b/b.draft)
	wet := s.X(scale.DryMass) + b.surge*s.X(scale.DisplacedMass)
	if zeta := b.wake.drag * s.X(scale.Density) * s.X(scale.Speed) * b.frontal / (4 * math.Pi * b.lockIn * wet); !math.IsNaN(zeta) {
		g.Put(group.DampingFlow, zeta)
	}
	g.Put(group.SuctionPeak, map[string]float64{"sphere": 1.25, "box": 1.5}[b.shape])
	if b.shape != "sphere" && b.shape != "box" {
		g.Put(group.SuctionPeak, suctionOfCylinder(s.X(scale.Speed)*b.l/s.X(scale.KinematicViscosity)))
	}
	b.gallop(s, g)
	massDamping(s, g, b.massRatio, b.surge, math.Pi/4)
}

// gallop puts the galloping speed ratio of a body that is no circle to the stream,
// as a rectangle of its plan, on the sway of its mooring.
func (b *floater) gallop(s *scale.Set, g *group.Set) {
	if b.round() {
		return
	}
	factor, _, err := canon.GallopingFactor(canon.SectionRectangle, math.Max(1e-3, math.Min(b.l/b.b, 1e3)))
	switch {
	case err != nil:
		return
	case math.IsNaN(b.lockIn) && !b.fixed:
		g.Miss(group.GallopingSpeed, group.Need{Input: floMooring.Path(), Unit: "N/m"})
		return
	case !s.Has(scale.Damping):
		g.Miss(group.GallopingSpeed, group.Need{Input: s.Needs(scale.Damping), Unit: "1"})
		return
	}
	sc := 4 * math.Pi * s.X(scale.DryMass) * s.X(scale.Damping) / (s.X(scale.Density) * b.b * b.b * b.draft)
	onset := 2 * sc * b.lockIn * b.b / factor
	high := s.X(scale.SpeedHigh)
	putOrWait(s, g, group.GallopingSpeed, high/math.Max(onset, 1e-9*high), scale.SpeedHigh, scale.FrequencyWet, scale.DryMass, scale.Density)
}
