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

// The fields of a cylinder.
var (
	cylDiameter     = quantity("diameter", units.Length, "gt=0", "outer diameter", "")
	cylRadius       = quantity("radius", units.Length, "gt=0", "outer radius, in place of the diameter", "")
	cylLength       = quantity("length", units.Length, "gt=0", "length between the supports", "")
	cylWall         = quantity("wall_thickness", units.Length, "gt=0", "wall thickness of a tube", "a solid section")
	cylMass         = quantity("mass_per_length", units.MassPerLength, "gt=0", "mass per length of structure and contents, never with added mass", "from material and section")
	cylContents     = quantity("contents_density", units.Density, "gt=0", "density of a liquid that fills a tube", "an empty tube")
	cylContentsDry  = flag("contents_included", "whether the contents move with the structure as part of its dry mass", "false: they count as added mass")
	cylSupport      = choice("support", "supports of the two ends", "pinned-pinned", "pinned-pinned", "clamped-free", "clamped-clamped", "clamped-pinned", "taut", "elastic", "spring-mounted")
	cylTension      = quantity("tension", units.Force, "gt=0", "tension", "none")
	cylEndStiffness = quantity("support_stiffness", units.RotationalStiffness, "gte=0", "rotational stiffness of both ends of an elastic support", "")
	cylMode         = whole("mode", "gte=1,lte=100", "number of the bending mode", "1")
	cylTip          = quantity("tip_mass", units.Mass, "gte=0", "point mass at the free end", "none")
	cylRoughness    = quantity("roughness", units.Length, "gte=0", "height of the surface roughness", "smooth")
	cylEnd          = choice("free_end", "shape of the free end in axial flow", "tapered", "tapered", "blunt")
	cylHeld         = flag("ends_held", "whether the supports hold the ends in the direction of the axis", "true for two supports, false for a free end, springs and taut")
	cylDrag         = pure("drag_coefficient", "gt=0", "mean drag coefficient on the diameter", "by Reynolds number")
	cylStrouhal     = pure("strouhal", "gt=0,lt=1", "Strouhal number", "by Reynolds number")
	cylLift         = pure("lift_coefficient", "gt=0", "r.m.s. unsteady lift coefficient", "0.3")
	cylBending      = quantity("bending_stiffness", units.BendingStiffnessBeam, "gt=0", "bending stiffness EI", "from Young's modulus and section")
)

// Cylinder is a rod, tube, riser, pile, cable, chimney or thermowell.
var Cylinder = &Kind{
	Name:  "cylinder",
	Title: "Circular cylinder",
	Doc:   "rod, tube, riser, pile, cable, chimney or thermowell in one bending mode, across or along a flow, free, near a wall, in a shell or below a surface",
	Fields: modal(elastic(cylDiameter, cylRadius, cylLength, cylWall, cylMass, cylBending, cylContents, cylContentsDry, cylSupport, cylTension, cylEndStiffness,
		cylMode, cylTip, cylRoughness, cylEnd, cylHeld, cylDrag, cylStrouhal, cylLift)...),
	Directions: []string{"cross", "axial"},
	Waves:      true,
	New:        newCylinder,
}

// cylinder holds the solved problems of one cylinder.
type cylinder struct {
	d           float64
	support     canon.BeamSupport
	spring      bool // rigid on springs
	n           int
	factors     canon.BeamFactors
	shell       float64 // D_s/D, NaN without
	cover       float64 // above the top over D, NaN without
	confined    float64 // added mass coefficient near walls
	wake        wake
	massRatio   float64
	bucklingU   float64 // critical U, NaN where none
	flutterU    float64
	axialMass   float64 // added mass per length in axial flow
	u           float64 // dimensionless axial speed
	beta        float64
	wet         float64 // share of the added mass that a partly wetted mode has
	sea         sea
	inertia     float64 // coefficient C_M in waves
	diffracts   bool    // C_M is that of a standing cylinder that diffracts the waves
	dragInertia float64
	beside      neighbour
	thin        bool    // a thin shell, whose section may oval
	ovalling    float64 // frequency of the lowest shell mode
	ovals       int     // its waves around
}

func newCylinder(r *Resolver) Physics {
	c := &cylinder{shell: math.NaN(), cover: math.NaN(), bucklingU: math.NaN(), flutterU: math.NaN(), axialMass: math.NaN(), massRatio: math.NaN(), dragInertia: math.NaN(), wet: 1}
	if !c.diameter(r) {
		return c
	}
	c.supports(r)
	r.closeGroups()
	r.damping()
	r.material()
	c.masses(r)
	c.frequencies(r)
	c.motion(r)
	if r.Is(group.Cross) {
		c.across(r)
	}
	if r.Is(group.Axial) {
		c.along(r)
	}
	if r.Is(group.Waves) {
		c.inWaves(r)
	}
	c.strain(r)
	return c
}

func (c *cylinder) diameter(r *Resolver) bool {
	d, radius := r.c.X(cylDiameter), r.c.X(cylRadius)
	switch {
	case math.IsNaN(d) && math.IsNaN(radius):
		r.violations.Add(cylDiameter.Pointer(), input.MissingField, "A cylinder needs a diameter (or a radius).", nil)
		return false
	case math.IsNaN(d):
		d = 2 * radius
		r.derive(scale.Length, d, units.Length, "the diameter, twice the radius")
	default:
		if !math.IsNaN(radius) && math.Abs(2*radius/d-1) > 1e-3 {
			r.contradict(cylRadius, "The radius is not half the diameter.")
		}
		r.Put(scale.Length, d, units.Length, scale.Given, "the diameter")
	}
	c.d = d
	r.derive(scale.ViscousLength, d/2, units.Length, "the radius")
	r.derive(scale.SemiChord, d/2, units.Length, "the radius")
	r.takeOrNeed(scale.Span, cylLength)
	if wall := r.c.X(cylWall); wall > d/2 {
		r.contradict(cylWall, "The wall is thicker than the radius.")
	}
	return true
}

var beamSupports = map[string]canon.BeamSupport{
	"pinned-pinned": canon.PinnedPinned, "clamped-free": canon.ClampedFree, "clamped-clamped": canon.ClampedClamped,
	"clamped-pinned": canon.ClampedPinned, "taut": canon.PinnedPinned, "elastic": canon.PinnedPinned, "spring-mounted": canon.PinnedPinned,
}

func (c *cylinder) supports(r *Resolver) {
	name := r.c.Choice(cylSupport, "pinned-pinned")
	c.support = beamSupports[name]
	c.spring = name == "spring-mounted"
	c.n = 1
	if v := r.c.Lookup(cylMode); v != nil {
		c.n = int(v.Q.Value)
	}
	c.factors, _ = canon.BeamModeFactors(c.support, c.n)
	if c.spring {
		c.factors = canon.BeamFactors{Mean: 1, MeanSquare: 1}
		c.n = 1
	}
	if !r.c.Has(cylSupport) {
		r.warn(cylSupport, "assumed", "The supports are taken as pinned at both ends.")
	}
	switch {
	case name == "taut" && !r.c.Has(cylTension) && !r.c.Has(FrequencyDry) && !r.c.Has(FrequencyWet):
		r.violations.Add(cylTension.Pointer(), input.MissingField, "A taut cylinder needs its tension, or a frequency.", nil)
	case name == "elastic" && !r.c.Has(cylEndStiffness) && !r.c.Has(FrequencyDry) && !r.c.Has(FrequencyWet):
		r.violations.Add(cylEndStiffness.Pointer(), input.MissingField, "An elastic support needs its stiffness, or a frequency.", nil)
	case r.c.Has(cylTip) && name != "clamped-free":
		r.contradict(cylTip, "A tip mass needs a free end: support clamped-free.")
	}
	r.trait(group.Bluff | group.Circular)
	c.flexible(r, name)
}

func (c *cylinder) flexible(r *Resolver, name string) {
	if c.spring {
		return
	}
	r.trait(group.Flexible | group.ModesDerived | group.Uniform)
	held := name != "clamped-free" && name != "taut"
	if v := r.c.Lookup(cylHeld); v != nil {
		held = v.Flag
	}
	if held {
		r.trait(group.Restrained)
	}
	if name == "clamped-free" {
		r.trait(group.Cantilever)
	}
}

// masses resolves dry, displaced and added mass per length.
func (c *cylinder) masses(r *Resolver) {
	area := math.Pi * c.d * c.d / 4
	rho := r.X(scale.Density)
	r.derive(scale.DisplacedMass, rho*area, units.MassPerLength, "ρπD²/4")
	r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	inner := 0.0
	if wall := r.c.X(cylWall); !math.IsNaN(wall) {
		inner = math.Max(c.d-2*wall, 0)
	}
	bore := math.Pi * inner * inner / 4
	contents := r.c.X(cylContents) * bore
	if math.IsNaN(contents) {
		contents = 0
	}
	if r.c.Has(cylContents) && bore == 0 {
		r.contradict(cylContents, "A solid cylinder has no contents; give a wall_thickness.")
	}
	dry := r.c.Flag(cylContentsDry, false)
	c.dryMass(r, area-bore, contents, dry)
	c.addedMass(r, rho*area, contents, dry)
}

func (c *cylinder) dryMass(r *Resolver, wall, contents float64, dry bool) {
	r.Value(scale.DryMass).Kind = units.MassPerLength
	if r.take(scale.DryMass, cylMass) {
		if !r.c.Has(cylContentsDry) && contents > 0 {
			r.warn(cylContentsDry, "assumed", "The mass per length is taken without the contents, which count as added mass.")
		}
	} else if r.closeGroups(); !r.Has(scale.DryMass) {
		m, how := r.X(scale.SolidDensity)*wall, "ρ_s times the section"
		if dry {
			m, how = m+contents, "ρ_s times the section, and the contents"
		}
		r.derive(scale.DryMass, m, units.MassPerLength, how)
		r.Need(scale.DryMass, cylMass.Path())
	}
	c.massRatio = r.X(scale.DryMass) / r.X(scale.DisplacedMass)
}

// addedMass resolves the ideal added mass, free and confined: contents that are
// no part of the dry mass count as added.
func (c *cylinder) addedMass(r *Resolver, displaced, contents float64, dry bool) {
	if dry {
		contents = 0
	}
	c.confined = 1
	gap := math.NaN()
	if w := r.X(scale.WallGap); !math.IsNaN(w) {
		c.confined, _ = canon.CylinderNearWall(w / c.d)
		gap = w
		r.trait(group.Confined)
	}
	if shell := r.X(scale.ShellDiameter); !math.IsNaN(shell) {
		c.shell = shell / c.d
		if c.shell <= 1 {
			r.contradict(ShellDiameter, "The shell is no wider than the cylinder.")
			return
		}
		if c.confined > 1 {
			r.contradict(ShellDiameter, "A wall and a shell at once are not solved; give the nearer one.")
		}
		q2 := c.shell * c.shell
		c.confined = (q2 + 1) / (q2 - 1)
		gap = (shell - c.d) / 2
		r.trait(group.Confined)
	}
	if !math.IsNaN(gap) {
		r.derive(scale.Gap, gap, units.Length, "nearest gap")
	}
	how := "ρπD²/4, and contents"
	if share := c.wettedShare(r); share < 1 {
		c.wet = c.modalMean(share, 2, func(float64) float64 { return 1 })
		displaced *= c.wet
		how = fmt.Sprintf("%.3g ρπD²/4, the wetted part of the mode, and contents", c.wet)
	}
	r.derive(scale.AddedMassFree, displaced+contents, units.MassPerLength, how)
	if c.confined > 1 {
		how = fmt.Sprintf("%.4g ρπD²/4 between the walls, and contents", c.confined*c.wet)
	}
	r.derive(scale.AddedMass, c.confined*displaced+contents, units.MassPerLength, how)
	r.addedNeeds(units.MassPerLength)
	c.surface(r)
}

// surface finds how far the free surface is.
func (c *cylinder) surface(r *Resolver) {
	d := r.X(scale.Depth)
	if math.IsNaN(d) || !r.Is(group.Fluid) {
		return
	}
	cover := d - c.d/2
	switch {
	case cover < 0:
		r.violations.Add(DepthBelowSurface.Pointer(), input.OutOfRange, "The axis lies less than a radius below the surface: a cylinder that pierces it is not solved.", nil)
	case atMost(d, 10*c.d):
		c.cover = cover / c.d
		r.trait(group.NearSurface)
	}
}

// frequencies resolves the dry frequency from the beam, and the wet one.
func (c *cylinder) frequencies(r *Resolver) {
	if r.take(scale.Bending, cylBending) {
	} else if e := r.X(scale.Young); !math.IsNaN(e) {
		inner := 0.0
		if wall := r.c.X(cylWall); !math.IsNaN(wall) {
			inner = c.d - 2*wall
		}
		r.derive(scale.Bending, e*math.Pi*(math.Pow(c.d, 4)-math.Pow(inner, 4))/64, units.BendingStiffnessBeam, "E π(D⁴ − D_i⁴)/64")
	}
	r.take(scale.Tension, cylTension)
	derived, how := c.beamFrequency(r)
	r.frequencies(derived, how, r.gamma(c.around(c.outside(r.Set))))
}

// beamFrequency is the dry frequency of the mode; NaN where it does not follow.
func (c *cylinder) beamFrequency(r *Resolver) (float64, string) {
	l, m, ei := r.X(scale.Span), r.X(scale.DryMass), r.X(scale.Bending)
	if c.spring || math.IsNaN(l) || math.IsNaN(m) {
		return math.NaN(), ""
	}
	name := r.c.Choice(cylSupport, "pinned-pinned")
	tension := r.X(scale.Tension)
	if name == "taut" {
		f := float64(c.n) / (2 * l) * math.Sqrt(tension/m)
		if math.IsNaN(ei) {
			return f, "n/(2ℓ) √(T/m)"
		}
		return f * math.Sqrt(1+math.Pow(float64(c.n)*math.Pi/l, 2)*ei/tension), "n/(2ℓ) √(T/m) with bending stiffness"
	}
	if math.IsNaN(ei) {
		return math.NaN(), ""
	}
	beta, err := c.root(r, name, m*l, l/ei)
	if err != nil {
		return math.NaN(), ""
	}
	f := beta * beta / (2 * math.Pi * l * l) * math.Sqrt(ei/m)
	if math.IsNaN(tension) {
		return f, fmt.Sprintf("β²/(2πℓ²) √(EI/m), β = %.5g", beta)
	}
	ratio, err := canon.TensionedBeam(c.support, c.n, tension*l*l/ei)
	if err != nil {
		return math.NaN(), ""
	}
	return f * ratio, fmt.Sprintf("β²/(2πℓ²) √(EI/m), β = %.5g, times %.4g for the tension", beta, ratio)
}

// root is the wave number times the length of the mode. flexibility is ℓ/EI.
func (c *cylinder) root(r *Resolver, name string, mass, flexibility float64) (float64, error) {
	if name == "elastic" {
		k := r.c.X(cylEndStiffness) * flexibility
		if math.IsNaN(k) {
			k = 0
		}
		end := canon.BeamEnd{Translation: 1e12, Rotation: k}
		return canon.ElasticBeamMode(end, end, c.n)
	}
	tip := 0.0
	if v := r.c.Lookup(cylTip); v != nil {
		tip = v.Q.Value / mass
	}
	return canon.BeamMode(c.support, c.n, tip)
}

// around is Γ of the viscous solution, per ideal added mass as confined, a share
// of which lies outside the tube.
func (c *cylinder) around(share float64) oscillation {
	return func(f, nu float64) (gr, gi float64, err error) {
		gr, gi, err = c.viscous(2 * math.Pi * f * c.d * c.d / 4 / nu)
		return 1 + share*(gr-1), share * gi, err
	}
}

// outside is the share of the ideal added mass that lies outside the tube: the
// contents move as a body and have no viscous layer that matters.
func (c *cylinder) outside(s *scale.Set) float64 {
	added := s.X(scale.AddedMass)
	if !(added > 0) {
		return 1
	}
	return c.confined * c.wet * s.X(scale.DisplacedMass) / added
}

// viscous is Γ at S = ωa²/ν per ideal added mass as confined.
func (c *cylinder) viscous(s float64) (gr, gi float64, err error) {
	if math.IsNaN(c.shell) {
		return canon.OscillatingCylinder(s)
	}
	gr, gi, err = canon.CylinderInShell(s, c.shell)
	return gr / c.confined, gi / c.confined, err
}

// motion puts the lengths over which an amplitude counts.
func (c *cylinder) motion(r *Resolver) {
	r.interestOf()
	if l := r.X(scale.Span); l > 0 && !c.spring {
		if k := c.factors.MaxCurvature / (l * l); k > 0 {
			r.derive(scale.CurvatureLength, 1/(k*c.d/2), units.Length, "ξ over the strain w″ D/2 of the mode")
		}
	}
	if c.spring {
		return
	}
	inner := 0.0
	if wall := r.c.X(cylWall); !math.IsNaN(wall) {
		inner = c.d - 2*wall
	}
	r.derive(scale.SectionRadius, math.Sqrt(c.d*c.d+inner*inner)/4, units.Length, "√(D² + D_i²)/4")
}

func (c *cylinder) strain(r *Resolver) {
	if c.spring {
		return
	}
	r.Need(scale.CurvatureLength, cylLength.Path())
	r.Value(scale.CurvatureLength).Kind = units.Length
}

var modeFactors = map[canon.BeamSupport]float64{
	canon.PinnedPinned: canon.ModeFactorSine, canon.ClampedFree: canon.ModeFactorCantilever,
	canon.ClampedClamped: canon.ModeFactorSine, canon.ClampedPinned: canon.ModeFactorSine,
}

// across solves the flow across the cylinder.
func (c *cylinder) across(r *Resolver) {
	c.beside = r.neighbour(c.d)
	c.oval(r)
	c.wake = wake{shape: canon.SectionCircle, strouhal: r.c.X(cylStrouhal), drag: r.c.X(cylDrag), lift: defaultLift,
		roughness: r.c.X(cylRoughness) / c.d, modeFactor: modeFactors[c.support], modes: c.modeRatios(r), first: c.n}
	if v := r.c.Lookup(cylLift); v != nil {
		c.wake.lift = v.Q.Value
	} else {
		if !c.wake.rough() && r.reynoldsAt(r.X(scale.Speed)) > canon.DragCrisisStart {
			c.wake.lift = supercriticalLift
		}
		r.warn(cylLift, "assumed", "The r.m.s. lift coefficient of shedding is taken as "+units.Format(c.wake.lift, units.Dimensionless)+".")
	}
	if c.spring {
		c.wake.modeFactor = canon.ModeFactorSpringMounted
	}
	added := r.X(scale.AddedMass) / r.X(scale.DisplacedMass)
	c.wake.solve(r, c.massRatio, added, math.Pi/4)
	c.wake.amplify(r, c.massRatio, added)
	if c.wake.vibrating() && !r.Is(group.Amplitude) {
		r.derive(scale.Amplitude, c.wake.amplitude*c.d, units.Length, "amplitude of the locked-in vibration")
	}
	u := r.X(scale.Speed)
	cd := c.wake.dragCoefficient(r.reynoldsAt(u))
	load := cd * r.X(scale.Density) * u * u / 2 * c.d
	factor := c.factors.Mean / c.factors.MeanSquare
	if factor == 0 { // an even mode has no share in a uniform load
		factor = 1
	}
	r.deflect(load, math.Abs(factor), units.ForcePerLength)
}

// modeRatios are the wet frequencies of the modes over that of the first one
// looked at.
func (c *cylinder) modeRatios(r *Resolver) []float64 {
	if c.spring {
		return []float64{1}
	}
	first, err := canon.BeamMode(c.support, c.n, 0)
	if err != nil {
		return []float64{1}
	}
	taut := r.c.Choice(cylSupport, "") == "taut"
	ratios := make([]float64, 0, group.MaxModes)
	for n := c.n; n < c.n+group.MaxModes; n++ {
		beta, err := canon.BeamMode(c.support, n, 0)
		switch {
		case err != nil:
			return ratios
		case taut:
			ratios = append(ratios, float64(n)/float64(c.n))
		default:
			ratios = append(ratios, beta*beta/(first*first))
		}
	}
	return ratios
}

// along solves the axial flow by slender-body theory: the added mass, confined
// as given, follows the bent cylinder.
func (c *cylinder) along(r *Resolver) {
	l, ei, u := r.X(scale.Span), r.X(scale.Bending), r.X(scale.Speed)
	c.axialMass = c.confined * r.X(scale.DisplacedMass)
	m := r.X(scale.DryMass)
	c.beta = c.axialMass / (c.axialMass + m)
	if math.IsNaN(l * ei * c.axialMass) {
		return
	}
	unit := math.Sqrt(ei/c.axialMass) / l
	c.u = u / unit
	critical := math.NaN()
	switch c.support {
	case canon.ClampedFree:
		if r.c.Choice(cylEnd, "tapered") == "tapered" {
			critical = math.Pi / 2
			break
		}
		if f, _, err := canon.ConveyingPipe(c.beta, 0, 0, canon.PipeCantilever); err == nil {
			c.flutterU = f * unit
		}
	default:
		critical = bucklingSpeeds[c.support]
	}
	c.bucklingU = critical * unit
	if c.support == canon.ClampedFree && !r.c.Has(cylEnd) {
		r.warn(cylEnd, "assumed", "The free end is taken as tapered, for which the flow buckles a cantilever earliest.")
	}
}

// Groups puts the groups that are the cylinder's own.
func (c *cylinder) Groups(s *scale.Set, g *group.Set) {
	g.Factors = c.factorsOf(s)
	g.Band = group.Transition{Low: 190, High: 300, Length: group.Reynolds}
	c.still(s, g)
	c.slender(s, g)
	switch {
	case g.Is(group.Cross):
		c.crossGroups(s, g)
	case g.Is(group.Axial):
		c.axialGroups(s, g)
	}
	if g.Is(group.Waves) {
		c.waveGroups(s, g)
	}
	massDamping(s, g, c.massRatio, 1, math.Pi/4)
}

// factorsOf are the model-form factors: the solutions are exact for a long
// cylinder, alone or in a shell; a wall and sound in a confined space are cousins.
func (c *cylinder) factorsOf(s *scale.Set) group.Factors {
	f := group.Factors{Inertia: 1.15, Viscous: 1.15, Acoustic: 1.15, Flow: 1.5, Buckling: 1.5, Flutter: 2, Stiffening: c.stiffening(), StallPerRadian: 1}
	if ratio := c.d / s.X(scale.Span); s.Has(scale.Span) && !atMost(ratio, 0.2) {
		f.Inertia, f.Viscous = 1.5, 1.5
	}
	if s.Has(scale.WallGap) {
		f.Viscous, f.Acoustic = 2, 1.5
	}
	if s.Has(scale.ShellDiameter) {
		f.Acoustic = 1.5
	}
	return f
}

// bucklingSpeeds are UL√(ρA/EI) at which an axial flow buckles a beam: the
// root of its Euler load, π, 2π, 4.4934.
var bucklingSpeeds = map[canon.BeamSupport]float64{canon.PinnedPinned: math.Pi, canon.ClampedClamped: 2 * math.Pi, canon.ClampedPinned: 4.493409457909064}

var stretchingBeams = map[canon.BeamSupport]canon.LargeAmplitudeKind{canon.PinnedPinned: canon.ImmovablePinnedBeam,
	canon.ClampedClamped: canon.ImmovableClampedBeam, canon.ClampedPinned: canon.ImmovableClampedPinnedBeam}

// stiffening is κ of √(1 + κ(ξ/r)²) for ends that can't move, from the solution
// at ξ = r.
func (c *cylinder) stiffening() float64 {
	ratio, err := canon.LargeAmplitude(stretchingBeams[c.support], 1, 1, 0.3)
	if err != nil {
		return 0
	}
	return ratio*ratio - 1
}

// still puts the factors of oscillation in fluid at rest.
func (c *cylinder) still(s *scale.Set, g *group.Set) {
	if !g.Is(group.Fluid) {
		return
	}
	g.Traits |= group.ViscousSolved
	fw := s.X(scale.FrequencyWet)
	share := c.outside(s)
	viscousGroups(s, g, c.around(share))
	soundGroups(s, g, math.Pi*fw*c.d/s.X(scale.SoundSpeed), func(ka float64) (gr, gi float64, err error) {
		gr, gi, err = canon.SoundCylinder(ka)
		return 1 + share*(gr-1), share * gi, err
	})
	if beta := s.X(scale.FrequencyMotion) * c.d * c.d / s.X(scale.KinematicViscosity); !math.IsNaN(beta) {
		g.Put(group.Beta, beta)
	}
	if !math.IsNaN(c.cover) {
		if lid, err := canon.CylinderBelowSurface(c.cover, canon.RigidLid); err == nil {
			g.Put(group.SurfaceInertiaLid, lid)
		}
		if free, err := canon.CylinderBelowSurface(c.cover, canon.PressureFree); err == nil {
			g.Put(group.SurfaceInertiaFree, free)
		}
	}
	rarefaction(s, g, c.d)
	g.Put(group.AcousticStep, s.X(scale.Density)*s.X(scale.SoundSpeed)*math.Pi*c.d/2/(20*fw*s.X(scale.DryMass)))
}

// putOrWait puts a value, or waits for the first absent scale of a list.
func putOrWait(s *scale.Set, g *group.Set, id group.ID, x float64, from ...scale.ID) {
	if math.IsNaN(x) {
		waitFor(s, g, from, id)
		return
	}
	g.Put(id, x)
}

// slender puts the groups of a bent cylinder.
func (c *cylinder) slender(s *scale.Set, g *group.Set) {
	if k := s.X(scale.Amplitude); !math.IsNaN(k) {
		g.Put(group.KeuleganCarpenter, 2*math.Pi*k/c.d)
	} else {
		g.Miss(group.KeuleganCarpenter, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: c.d / (2 * math.Pi), Power: 1})
	}
	c.dragDamping(s, g)
	if c.spring {
		return
	}
	putOrWait(s, g, group.Slenderness, c.d/s.X(scale.Span), scale.Span)
	slope := c.factors.MaxSlope * s.X(scale.Amplitude) / s.X(scale.Span)
	if math.IsNaN(slope) && s.Has(scale.Span) {
		g.Miss(group.Slope, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: s.X(scale.Span) / c.factors.MaxSlope, Power: 1})
	} else {
		putOrWait(s, g, group.Slope, slope, scale.Span, scale.Amplitude)
	}
	if r := s.X(scale.SectionRadius); s.Has(scale.Amplitude) {
		g.Put(group.DisplacementThickness, s.X(scale.Amplitude)/r)
	} else {
		g.Miss(group.DisplacementThickness, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: r, Power: 1})
	}
}

// dragDamping puts the equivalent damping of quadratic drag in still fluid.
func (c *cylinder) dragDamping(s *scale.Set, g *group.Set) {
	if g.Any(group.Flow) || !g.Is(group.Fluid) {
		return
	}
	wet := s.X(scale.DryMass) + s.X(scale.AddedMass)
	g.Put(group.DragDamping, 2/(3*math.Pi)*1.2*s.X(scale.Density)*c.d*c.d/wet*s.X(scale.Amplitude)/c.d)
}

// crossGroups puts what flow across makes.
func (c *cylinder) crossGroups(s *scale.Set, g *group.Set) {
	c.beside.groups(g)
	c.ovallingGroups(s, g)
	c.wake.groups(s, g)
	g.Drop(group.ReducedFrequency)
	g.Put(group.FlowStiffness, 0) // by symmetry: drag does not change with the place
	if cd := g.Get(group.DragCoefficient); !math.IsNaN(cd) {
		wet := s.X(scale.DryMass) + s.X(scale.AddedMass)
		g.Put(group.DampingFlow, cd*s.X(scale.Density)*s.X(scale.Speed)*c.d/(4*2*math.Pi*s.X(scale.FrequencyWet)*wet))
	}
	g.Put(group.SuctionPeak, suctionOfCylinder(g.Get(group.Reynolds)))
	putOrWait(s, g, group.SpanRatio, c.d/s.X(scale.Span), scale.Span)
	gusts(s, g, c.d)
}

// suctionOfCylinder is −Cp_min: 1.2 in a subcritical wake, up to the 3 of
// potential flow beyond the drag crisis, where the larger is the safer one
// (Batchelor 1967; Roshko 1961, from memory).
func suctionOfCylinder(re float64) float64 {
	if re < canon.DragCrisisStart {
		return 1.2
	}
	return 3
}

// axialGroups puts what flow along makes.
func (c *cylinder) axialGroups(s *scale.Set, g *group.Set) {
	g.Traits &^= group.Bluff
	g.Band = group.Transition{Low: 3e5, High: 3e6, Length: group.LengthReynolds}
	g.Drop(group.ReducedFrequency)
	g.Put(group.TurbulenceIntensity, s.X(scale.Turbulence))
	if !s.Has(scale.Turbulence) {
		g.Drop(group.TurbulenceIntensity)
	}
	g.Put(group.SuctionPeak, 1) // the rounded end of a slender body stays below its dynamic pressure
	g.Put(group.StaticDeflection, 0)
	g.Put(group.StaticDeflectionInterest, 0)
	g.Put(group.StaticDeflectionSpan, 0)
	putOrWait(s, g, group.SpanRatio, c.d/s.X(scale.Span), scale.Span)
	c.boundaryLayer(s, g)
	needs := []scale.ID{scale.Speed, scale.Span, scale.Bending, scale.DryMass, scale.Density}
	if math.IsNaN(c.u) || c.u == 0 && math.IsNaN(c.bucklingU) && math.IsNaN(c.flutterU) {
		waitFor(s, g, needs, group.ConveyingSpeed, group.FlowStiffness, group.BucklingSpeed, group.PseudoStatic)
		if !s.Has(scale.Bending) {
			for _, id := range []group.ID{group.ConveyingSpeed, group.FlowStiffness, group.BucklingSpeed, group.PseudoStatic} {
				g.Miss(id, group.Need{Input: Young.Path(), Unit: "Pa"})
			}
		}
		return
	}
	g.Put(group.ConveyingSpeed, c.u)
	putOrWait(s, g, group.ConveyingMass, c.beta, scale.DryMass)
	high := s.X(scale.SpeedHigh)
	switch {
	case !math.IsNaN(c.bucklingU):
		g.Put(group.BucklingSpeed, high/c.bucklingU)
		ratio := s.X(scale.Speed) / c.bucklingU
		g.Put(group.FlowStiffness, ratio*ratio)
	case !math.IsNaN(c.flutterU):
		g.Put(group.FlutterSpeed, high/c.flutterU)
		ratio := s.X(scale.Speed) / c.flutterU
		g.Put(group.FlowStiffness, ratio*ratio)
	}
	// gyroscopic (Coriolis) force of the flow over its centrifugal one
	omega := 2 * math.Pi * s.X(scale.FrequencyWet)
	k := math.Pi / s.X(scale.Span)
	putOrWait(s, g, group.PseudoStatic, 2*omega/(s.X(scale.Speed)*k), scale.FrequencyWet, scale.Speed)
}

func (c *cylinder) boundaryLayer(s *scale.Set, g *group.Set) {
	re := g.Get(group.LengthReynolds)
	if math.IsNaN(re) {
		g.Miss(group.BoundaryLayer, g.Need(group.LengthReynolds))
		return
	}
	g.Put(group.BoundaryLayer, displacementThickness(re)*s.X(scale.Span)/c.d)
}
