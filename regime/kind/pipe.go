package kind

import (
	"fmt"
	"math"
	"sync"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// The fields of a pipe.
var (
	pipeBore       = quantity("inner_diameter", units.Length, "gt=0", "inner diameter", "")
	pipeWall       = quantity("wall_thickness", units.Length, "gt=0", "wall thickness", "")
	pipeLength     = quantity("length", units.Length, "gt=0", "length between the supports", "")
	pipeColumn     = quantity("column_length", units.Length, "gt=0", "length of the column of fluid between the ends that reflect pressure waves", "the length between the supports")
	pipeMass       = quantity("mass_per_length", units.MassPerLength, "gt=0", "mass per length of the empty pipe", "from material and section")
	pipeBending    = quantity("bending_stiffness", units.BendingStiffnessBeam, "gt=0", "bending stiffness EI", "from Young's modulus and section")
	pipeSupport    = choice("support", "supports of the two ends, the upstream end first", "pinned-pinned", "pinned-pinned", "clamped-free", "clamped-clamped", "clamped-pinned")
	pipeHeld       = flag("ends_held", "whether the supports hold the ends in the direction of the axis", "true for two supports, false for a free end")
	pipeMode       = whole("mode", "gte=1,lte=100", "number of the bending mode", "1")
	pipeTension    = quantity("tension", units.Force, "gt=0", "tension that the supports put into the pipe", "none")
	pipeSlope      = quantity("inclination", units.Angle, "gte=-1.5708,lte=1.5708", "how steeply the flow runs down: 90 deg hangs with the outlet below, -90 deg stands", "0 deg, level")
	pipeAnchoring  = choice("anchoring", "how the pipe is held along its axis, for pressure waves", "upstream", "upstream", "throughout", "expansion-joints")
	pipeClosure    = quantity("closure_time", units.Time, "gte=0", "time in which a valve or pump changes the flow", "")
	pipeChange     = quantity("speed_change", units.Speed, "gte=0", "largest change of the flow speed by a valve or pump; 0 where there is none", "the speed of the flow")
	pipeColumnEnds = choice("column_ends", "ends of the column of fluid for sound: open to a vessel, or closed by a valve or pump", "open-closed", "open-closed", "open-open", "closed-closed")
	pipeRoughness  = quantity("roughness", units.Length, "gte=0", "height of the roughness of the bore", "smooth")
	pipeOutside    = quantity("external_density", units.Density, "gt=0", "density of a liquid at rest around the pipe", "a gas that does not count")
	pipeOutsideVis = quantity("external_viscosity", units.DynamicViscosity, "gt=0", "dynamic viscosity of the liquid around the pipe", "")
)

// Pipe is a pipe or hose that carries fluid.
var Pipe = &Kind{
	Name:  "pipe",
	Title: "Pipe carrying fluid",
	Doc:   "pipe, hose or tube that carries fluid, in one bending mode: conveying stability, pressure surge, and the column of fluid",
	Fields: modal(elastic(pipeBore, pipeWall, pipeLength, pipeColumn, pipeMass, pipeBending, pipeSupport, pipeHeld, pipeMode, pipeTension, pipeSlope,
		pipeAnchoring, pipeClosure, pipeChange, pipeColumnEnds, pipeRoughness, pipeOutside, pipeOutsideVis)...),
	Directions: []string{"internal"},
	New:        newPipe,
}

// pipe holds the solved problems of one pipe.
type pipe struct {
	d, outer  float64 // bore and outside diameter; outside NaN without a wall
	bore      float64 // area of the bore
	support   canon.BeamSupport
	conveying canon.PipeSupport
	held      bool
	n         int
	beta4     float64 // λ⁴ of the mode
	slope     float64 // ∫φ′²/∫φ²
	factors   canon.BeamFactors
	content   float64 // mass of fluid inside, per length
	outside   float64 // added mass of fluid around, per length
	stiffness float64 // λ⁴ and what tension, pressure and weight add
	weight    float64 // γ
	squeeze   float64 // Π, pressure less tension
	c1        float64 // anchoring
	critical  float64 // critical speed, NaN where not known
	flutter   bool
	ownWeight bool // buckles under its own weight
	roughness float64
	// viscosity of the liquid around, NaN without
	outsideViscosity float64
	quarter          bool // the column is open at one end and closed at the other
	heldThroughout   bool // along its axis
	pressureGiven    bool
}

func newPipe(r *Resolver) Physics {
	p := &pipe{outer: math.NaN(), critical: math.NaN(), c1: math.NaN(), stiffness: math.NaN(), weight: math.NaN()}
	d := r.c.Lookup(pipeBore)
	if d == nil {
		r.violations.Add(pipeBore.Pointer(), input.MissingField, "A pipe needs its inner diameter.", nil)
		return p
	}
	p.d, p.outsideViscosity = d.Q.Value, r.c.X(pipeOutsideVis)
	p.geometry(r)
	p.supports(r)
	r.closeGroups()
	r.damping()
	r.material()
	p.masses(r)
	p.bending(r)
	derived, how := p.frequency(r)
	r.frequencies(derived, how, p.gamma(r))
	p.motion(r)
	p.column(r)
	p.surge(r)
	if r.Is(group.Internal) {
		p.stability(r)
	}
	p.unused(r)
	return p
}

func (p *pipe) geometry(r *Resolver) {
	r.Put(scale.Length, p.d, units.Length, scale.Given, "the inner diameter")
	r.derive(scale.ViscousLength, p.d/2, units.Length, "the inner radius")
	r.takeOrNeed(scale.Span, pipeLength)
	if !r.take(scale.ColumnLength, pipeColumn) {
		if r.Has(scale.Span) {
			r.Put(scale.ColumnLength, r.X(scale.Span), units.Length, scale.Assumed, "the length between the supports")
		}
		r.Need(scale.ColumnLength, pipeLength.Path())
		r.Value(scale.ColumnLength).Kind = units.Length
	}
	r.takeOrNeed(scale.Thickness, pipeWall)
	p.bore = math.Pi * p.d * p.d / 4
	p.outer = p.d + 2*r.X(scale.Thickness)
	p.roughness = 0
	if r.take(scale.Roughness, pipeRoughness) {
		p.roughness = r.X(scale.Roughness) / p.d
	}
	r.trait(group.Column)
}

var pipeBeams = map[string]canon.BeamSupport{"pinned-pinned": canon.PinnedPinned, "clamped-free": canon.ClampedFree,
	"clamped-clamped": canon.ClampedClamped, "clamped-pinned": canon.ClampedPinned}

var pipeConveying = map[string]canon.PipeSupport{"pinned-pinned": canon.PipePinnedPinned, "clamped-free": canon.PipeCantilever,
	"clamped-clamped": canon.PipeClampedClamped, "clamped-pinned": canon.PipeClampedPinned}

func (p *pipe) supports(r *Resolver) {
	name := r.c.Choice(pipeSupport, "pinned-pinned")
	if !r.c.Has(pipeSupport) {
		r.warn(pipeSupport, "assumed", "The supports are taken as pinned at both ends.")
	}
	p.support, p.conveying = pipeBeams[name], pipeConveying[name]
	p.n = 1
	if v := r.c.Lookup(pipeMode); v != nil {
		p.n = int(v.Q.Value)
	}
	p.factors, _ = canon.BeamModeFactors(p.support, p.n)
	p.slope = p.factors.MeanSquareSlope / p.factors.MeanSquare
	root, _ := canon.BeamMode(p.support, p.n, 0)
	p.beta4 = math.Pow(root, 4)
	r.trait(group.Flexible | group.ModesDerived | group.Uniform)
	p.held = r.c.Flag(pipeHeld, name != "clamped-free")
	switch {
	case name != "clamped-free":
	case r.c.Has(pipeTension):
		r.contradict(pipeTension, "A free end holds no tension.")
	case p.held:
		r.contradict(pipeHeld, "A free end is not held along the axis.")
	}
	if p.held {
		r.trait(group.Restrained)
	}
	if name == "clamped-free" {
		r.trait(group.Cantilever)
	}
}

// masses resolves the mass per length of the pipe, and that of the fluid inside
// and around, which count as added mass.
func (p *pipe) masses(r *Resolver) {
	rho := r.X(scale.Density)
	p.content = rho * p.bore
	r.derive(scale.DisplacedMass, p.content, units.MassPerLength, "ρπD²/4 of the bore")
	r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	wall := p.section(r)
	r.Value(scale.DryMass).Kind = units.MassPerLength
	if !r.take(scale.DryMass, pipeMass) {
		if r.closeGroups(); !r.Has(scale.DryMass) {
			r.derive(scale.DryMass, r.X(scale.SolidDensity)*wall, units.MassPerLength, "ρ_s times the section")
			r.Need(scale.DryMass, pipeMass.Path())
		}
	}
	how := "ρπD²/4 of the bore"
	if r.take(scale.ExternalDensity, pipeOutside) {
		p.outside = r.X(scale.ExternalDensity) * math.Pi * p.outer * p.outer / 4
		how = "fluid in the bore, and ρ_e π D_o²/4 around"
	}
	added := p.content + p.outside
	for _, id := range []scale.ID{scale.AddedMass, scale.AddedMassFree} {
		r.derive(id, added, units.MassPerLength, how)
		r.Need(id, neededBy(r.Set, scale.Density, scale.Thickness))
		r.Value(id).Kind = units.MassPerLength
	}
}

// section is the area of the wall, πe(D + e).
func (p *pipe) section(r *Resolver) float64 {
	e := r.X(scale.Thickness)
	return math.Pi * e * (p.d + e)
}

// neededBy is the input that the first absent scale of a list waits for.
func neededBy(s *scale.Set, ids ...scale.ID) string {
	for _, id := range ids {
		if !s.Has(id) && s.Needs(id) != "" {
			return s.Needs(id)
		}
	}
	return ""
}

// bending resolves EI, and what tension, pressure and weight make of the
// stiffness of the mode.
func (p *pipe) bending(r *Resolver) {
	if !r.take(scale.Bending, pipeBending) {
		ei := r.X(scale.Young) * p.section(r) * (p.outer*p.outer + p.d*p.d) / 16
		r.derive(scale.Bending, ei, units.BendingStiffnessBeam, "E π(D_o⁴ − D⁴)/64")
		r.Need(scale.Bending, neededBy(r.Set, scale.Young, scale.Thickness))
		r.Value(scale.Bending).Kind = units.BendingStiffnessBeam
	}
	r.take(scale.Tension, pipeTension)
	l, ei := r.X(scale.Span), r.X(scale.Bending)
	p.squeeze = p.compression(r) * l * l / ei
	p.weight = p.hanging(r) * l * l * l / ei
	if r.c.X(pipeSlope) == 0 || !r.c.Has(pipeSlope) {
		p.weight = 0
	}
}

// compression is the force that presses the held pipe along its axis: the
// pressure on the bore, less what Poisson's ratio takes of it, less the tension
// (Païdoussis 1998, chapter 3, from memory; p at the downstream end).
func (p *pipe) compression(r *Resolver) float64 {
	force := 0.0
	if gauge := p.gauge(r); p.held && !math.IsNaN(gauge) {
		force = gauge * p.bore * (1 - 2*r.X(scale.Poisson))
	}
	if r.Has(scale.Tension) {
		force -= r.X(scale.Tension)
	}
	return force
}

// gauge is the pressure inside above the ambient one, NaN where it was not given.
func (p *pipe) gauge(r *Resolver) float64 {
	if !r.Is(group.Fluid) || !r.c.Has(FluidPressure) {
		return math.NaN()
	}
	return r.X(scale.Pressure) - r.X(scale.AmbientPressure)
}

// hanging is the weight per length in the direction of the flow, less buoyancy.
func (p *pipe) hanging(r *Resolver) float64 {
	content := p.content
	if !r.Is(group.Fluid) {
		content = 0
	}
	return (r.X(scale.DryMass) + content - p.outside) * r.X(scale.Gravity) * math.Sin(r.c.X(pipeSlope))
}

// hangingMode is ∫(1 − ξ)φ′²/∫φ² of the mode: 1.5709 of the first of a
// cantilever (Blevins 1979, from memory; the test integrates it), else half of
// ∫φ′², exact for modes that are even or odd about the middle.
func (p *pipe) hangingMode() float64 {
	if p.support == canon.ClampedFree && p.n == 1 {
		return 1.570878
	}
	return p.slope / 2
}

// frequency is the dry frequency of the mode with the stiffness that tension,
// pressure and weight add; NaN where it does not follow.
func (p *pipe) frequency(r *Resolver) (float64, string) {
	l, ei, m := r.X(scale.Span), r.X(scale.Bending), r.X(scale.DryMass)
	ratio := 1.0
	if p.squeeze != 0 && !math.IsNaN(p.squeeze) {
		t, err := canon.TensionedBeam(p.support, p.n, -p.squeeze)
		if err != nil {
			t = math.NaN()
		}
		ratio = t
	}
	p.stiffness = p.beta4*ratio*ratio + p.weight*p.hangingMode()
	how := "λ²/(2πℓ²) √(EI/m) of the mode"
	if p.weight != 0 || p.squeeze != 0 {
		how += ", with weight, pressure and tension"
	}
	if !(p.stiffness > 0) {
		p.stiffness = math.NaN()
	}
	return math.Sqrt(p.stiffness) / (2 * math.Pi * l * l) * math.Sqrt(ei/m), how
}

// gamma is Γr per added mass: the fluid inside moves with the bore as a body,
// that around has a viscous layer.
func (p *pipe) gamma(r *Resolver) func(f float64) float64 {
	share := p.outside / (p.outside + p.content)
	nu := p.outsideViscosity / r.X(scale.ExternalDensity)
	if !(share > 0) || math.IsNaN(nu) {
		return nil
	}
	return func(f float64) float64 {
		re, _, err := canon.OscillatingCylinder(2 * math.Pi * f * p.outer * p.outer / 4 / nu)
		if err != nil {
			return 1
		}
		return 1 + share*(re-1)
	}
}

func (p *pipe) motion(r *Resolver) {
	r.interestOf()
	l := r.X(scale.Span)
	if k := p.factors.MaxCurvature / (l * l); k > 0 {
		r.derive(scale.CurvatureLength, 2/(k*p.outer), units.Length, "ξ over the strain w″ D_o/2 of the mode")
	}
	r.Need(scale.CurvatureLength, neededBy(r.Set, scale.Span, scale.Thickness))
	r.Value(scale.CurvatureLength).Kind = units.Length
	r.derive(scale.SectionRadius, math.Sqrt(p.outer*p.outer+p.d*p.d)/4, units.Length, "√(D_o² + D²)/4")
}

var pipeAnchorings = map[string]canon.PipeAnchoring{"upstream": canon.AnchoredUpstream, "throughout": canon.AnchoredThroughout, "expansion-joints": canon.ExpansionJoints}

// column resolves the speed of pressure waves and the sound in the column.
func (p *pipe) column(r *Resolver) {
	if !r.Is(group.Fluid) {
		return
	}
	c, rho := r.X(scale.SoundSpeed), r.X(scale.Density)
	slender := p.d / r.X(scale.Thickness)
	if c1, err := canon.PipeConstraint(pipeAnchorings[r.c.Choice(pipeAnchoring, "upstream")], r.X(scale.Poisson), math.Min(math.Max(slender, 0.1), 1e9)); err == nil {
		p.c1 = c1
	}
	a := c * waveSpeedRatio(p.c1*rho*c*c*slender/r.X(scale.Young))
	r.derive(scale.WaveSpeed, a, units.Speed, "c/√(1 + c₁ρc²D/(Ee))")
	r.Need(scale.WaveSpeed, neededBy(r.Set, scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young))
	r.Value(scale.WaveSpeed).Kind = units.Speed
	waves, how := 2.0, "a/(2ℓ_c)"
	p.quarter = r.c.Choice(pipeColumnEnds, "open-closed") == "open-closed"
	if p.quarter {
		waves, how = 4, "a/(4ℓ_c)"
	}
	p.heldThroughout = r.c.Choice(pipeAnchoring, "upstream") == "throughout"
	p.pressureGiven = r.c.Has(FluidPressure)
	r.derive(scale.ColumnFrequency, a/(waves*r.X(scale.ColumnLength)), units.Frequency, how)
	r.Need(scale.ColumnFrequency, neededBy(r.Set, scale.WaveSpeed, scale.ColumnLength))
	r.Value(scale.ColumnFrequency).Kind = units.Frequency
	if r.Is(group.Internal) && !r.c.Has(pipeAnchoring) {
		r.warn(pipeAnchoring, "assumed", "The pipe is taken as anchored at its upstream end, so that its wall may move along the axis; loose bends and branches add junction coupling, which is not priced.")
	}
}

// waveSpeedRatio is the speed of pressure waves in an elastic tube over that of sound.
//
//	a/c = 1/√(1 + ψ), ψ = c₁KD/(Ee)
//
// Symbols: compliance ψ [1]. Range: ψ ≥ 0. Accuracy: exact for long waves.
// Check: ψ 0.5489 (K 2.2e9, D/e 50, E 2e11, c₁ 1: 0.55): 0.80322. Source: Korteweg 1878.
func waveSpeedRatio(compliance float64) float64 { return 1 / math.Sqrt(1+compliance) }

// surge takes what changes the flow.
func (p *pipe) surge(r *Resolver) {
	if !r.Is(group.Internal) {
		return
	}
	if !r.take(scale.SpeedChange, pipeChange) && r.Has(scale.Speed) {
		r.Put(scale.SpeedChange, r.X(scale.SpeedHigh), units.Speed, scale.Assumed, "the flow is stopped from its highest speed of operation")
	}
	r.Need(scale.SpeedChange, FlowSpeed.Path())
	r.Value(scale.SpeedChange).Kind = units.Speed
	r.takeOrNeed(scale.ClosureTime, pipeClosure)
}

// Range of the weight within which the onset is solved: above it the onset is
// taken at the end of the range, since weight that hangs only stiffens; γ of
// a hanging pipe (Païdoussis 1998, from memory).
const heaviest = 100

// Share of fluid in the mass beyond which the onset is not solved: it rises with
// the share (Gregory & Païdoussis 1966), so that the end of the range is the safe side.
const mostFluid, leastFluid = 0.95, 1e-4

// Speed u beyond which the onset is not looked for.
const fastest = 32

// stability solves the critical speed of the conveying pipe.
func (p *pipe) stability(r *Resolver) {
	l, ei, m := r.X(scale.Span), r.X(scale.Bending), r.X(scale.DryMass)
	beta := p.content / (p.content + p.outside + m)
	unit := math.Sqrt(ei/p.content) / l
	p.flutter = p.conveying == canon.PipeCantilever
	if math.IsNaN(unit*beta) || unit == 0 || math.IsInf(unit, 0) || math.IsNaN(p.weight) {
		return
	}
	u, state := onsetOf(beta, p.weight, p.loss(r), p.conveying)
	switch state {
	case fellUnderWeight:
		p.ownWeight = true
		r.warn(pipeSlope, "own-weight", "The standing pipe buckles under its own weight without any flow.")
		return
	case beyondWeight:
		r.warn(pipeLength, "end-of-range", fmt.Sprintf("The weight over the bending stiffness, %.3g, lies beyond %d; the onset is taken there, on the safe side.", p.weight, heaviest))
	case beyondShare:
		r.warn(pipeMass, "end-of-range", fmt.Sprintf("The fluid makes %.4g of the mass; the onset is taken at %g of it, on the safe side.", beta, mostFluid))
	case beyondSpeed:
		r.warn(pipeLength, "end-of-range", fmt.Sprintf("No onset lies below u = %d; the pipe is taken as stable to there.", fastest))
	}
	if p.flutter {
		p.critical = u * unit
		return
	}
	// pressure and tension move the square of the critical speed
	p.critical = unit * math.Sqrt(math.Max(u*u-p.squeeze, 0))
	if p.squeeze >= u*u {
		r.warn(FluidPressure, "buckled-by-pressure", "The pressure alone buckles the pipe between ends that are held along the axis.")
	}
}

// loss is the loss factor of the material, twice the damping ratio of the dry
// mode; 0 where it is not known.
func (p *pipe) loss(r *Resolver) float64 {
	if !r.Has(scale.Damping) {
		return 0
	}
	return 2 * r.X(scale.Damping)
}

// unused warns of surroundings that a pipe has no use for.
func (p *pipe) unused(r *Resolver) {
	for _, f := range []*input.Field{WallGap, ShellDiameter, DepthBelowSurface, BackingDepth} {
		if r.c.Has(f) {
			r.warn(f, "not-used", "Walls and surfaces around a pipe are not solved; give external_density for the liquid around it.")
		}
	}
}

// onsetState says how an onset was found.
type onsetState uint8

const (
	found onsetState = iota
	fellUnderWeight
	beyondWeight
	beyondShare
	beyondSpeed
)

type onsetKey struct {
	beta, gamma, loss float64
	support           canon.PipeSupport
}

type onset struct {
	u     float64
	state onsetState
}

// onsets remembers solved onsets: a sweep over speeds asks for the same one.
var onsets = struct {
	sync.Mutex
	known map[onsetKey]onset
}{known: map[onsetKey]onset{}}

const mostOnsets = 4096

// onsetOf is the lowest u = UL√(M/EI) at which a conveying pipe loses stability.
// The arguments are rounded to eleven digits, so that the same pipe in other
// units is the same pipe.
func onsetOf(beta, gamma, loss float64, support canon.PipeSupport) (float64, onsetState) {
	if support != canon.PipeCantilever {
		beta, loss = 0.5, 0 // buckling does not depend on mass and damping
	}
	key := onsetKey{elevenDigits(beta), elevenDigits(gamma), elevenDigits(loss), support}
	onsets.Lock()
	o, ok := onsets.known[key]
	onsets.Unlock()
	if ok {
		return o.u, o.state
	}
	o = solveOnset(key)
	onsets.Lock()
	defer onsets.Unlock()
	if len(onsets.known) >= mostOnsets {
		clear(onsets.known)
	}
	onsets.known[key] = o
	return o.u, o.state
}

func elevenDigits(x float64) float64 {
	if x == 0 {
		return 0
	}
	scale := math.Pow(10, 10-math.Floor(math.Log10(math.Abs(x))))
	if math.IsInf(scale, 0) || scale == 0 {
		return x
	}
	return math.Round(x*scale) / scale
}

// solveOnset solves at the ends of the range where the pipe lies beyond it. The
// loss factor η of the material makes (1 + iη) of the stiffness at any frequency;
// at the onset, where the motion is harmonic at ω, that is the dissipation
// α = η/ω of the viscoelastic equation, found by iteration.
func solveOnset(k onsetKey) onset {
	o := onset{}
	gamma := k.gamma
	if gamma > heaviest {
		gamma, o.state = heaviest, beyondWeight
	}
	beta := math.Max(k.beta, leastFluid)
	if beta > mostFluid {
		beta, o.state = mostFluid, beyondShare
	}
	u, omega, err := canon.ConveyingPipe(beta, gamma, 0, k.support)
	for range 3 {
		if err != nil || k.loss == 0 || omega == 0 {
			break
		}
		u, omega, err = canon.ConveyingPipe(beta, gamma, math.Min(k.loss/omega, 0.1), k.support)
	}
	switch {
	case err == nil:
		o.u = u
	case gamma < 0:
		o.state = fellUnderWeight
	default:
		o.u, o.state = fastest, beyondSpeed
	}
	return o
}

// Groups puts the groups that are the pipe's own.
func (p *pipe) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.15, Viscous: 1.15, Acoustic: 1.15, Flow: 1.5, Buckling: 1.15, Flutter: 1.15, Stiffening: p.stiffening(), StallPerRadian: 1}
	g.Band = group.Transition{Low: 2300, High: 4000, Length: group.Reynolds}
	p.bent(s, g)
	if !g.Is(group.Fluid) {
		return
	}
	p.still(s, g)
	p.strokeAround(s, g)
	p.waves(s, g)
	if g.Is(group.Internal) {
		p.flow(s, g)
		p.surges(s, g)
	}
}

func (p *pipe) stiffening() float64 {
	ratio, err := canon.LargeAmplitude(stretchingBeams[p.support], 1, 1, 0.3)
	if err != nil {
		return 0
	}
	return ratio*ratio - 1
}

// bent puts the groups of a bent pipe.
func (p *pipe) bent(s *scale.Set, g *group.Set) {
	putOrWait(s, g, group.Slenderness, p.outer/s.X(scale.Span), scale.Thickness, scale.Span)
	slope := p.factors.MaxSlope / s.X(scale.Span)
	amplitude := s.X(scale.Amplitude)
	switch {
	case math.IsNaN(slope):
		putOrWait(s, g, group.Slope, slope, scale.Span)
	case math.IsNaN(amplitude):
		g.Miss(group.Slope, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: 1 / slope, Power: 1})
	default:
		g.Put(group.Slope, slope*amplitude)
	}
	radius := s.X(scale.SectionRadius)
	switch {
	case math.IsNaN(radius):
		putOrWait(s, g, group.DisplacementThickness, radius, scale.Thickness)
	case math.IsNaN(amplitude):
		g.Miss(group.DisplacementThickness, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: radius, Power: 1})
	default:
		g.Put(group.DisplacementThickness, amplitude/radius)
	}
}

// still puts the factors of oscillation in fluid at rest.
func (p *pipe) still(s *scale.Set, g *group.Set) {
	g.Traits |= group.ViscousSolved
	fw := s.X(scale.FrequencyWet)
	p.viscous(s, g, fw)
	p.acoustic(s, g, fw)
	if !g.Is(group.Liquid) {
		putOrWait(s, g, group.Knudsen, meanFreePath(s)/p.d, scale.HeatCapacityRatio, scale.KinematicViscosity, scale.SoundSpeed)
	} else {
		g.Drop(group.Knudsen)
	}
	acousticStep(s, g, math.Pi*p.d)
}

// viscous puts Γ: the fluid inside is carried along as a body, whatever its
// viscosity; that around drags its layer.
func (p *pipe) viscous(s *scale.Set, g *group.Set, fw float64) {
	share := p.outside / (p.outside + p.content)
	if !(p.outside > 0) {
		g.Put(group.ViscousInertia, 1)
		g.Put(group.ViscousDamping, 0)
		return
	}
	if !s.Has(scale.ExternalDensity) || math.IsNaN(share) {
		waitFor(s, g, []scale.ID{scale.Density, scale.Thickness}, group.ViscousInertia, group.ViscousDamping)
		return
	}
	p.viscousOutside(s, g, fw, share)
}

func (p *pipe) viscousOutside(s *scale.Set, g *group.Set, fw, share float64) {
	nu := p.outsideViscosity / s.X(scale.ExternalDensity)
	switch {
	case math.IsNaN(nu):
		for _, id := range []group.ID{group.ViscousInertia, group.ViscousDamping} {
			g.Miss(id, group.Need{Input: pipeOutsideVis.Path(), Unit: units.DynamicViscosity.SI()})
		}
	case math.IsNaN(fw):
		waitFor(s, g, []scale.ID{scale.FrequencyWet}, group.ViscousInertia, group.ViscousDamping)
	default:
		if gr, gi, err := canon.OscillatingCylinder(2 * math.Pi * fw * p.outer * p.outer / 4 / nu); err == nil {
			g.Put(group.ViscousInertia, 1+share*(gr-1))
			g.Put(group.ViscousDamping, share*gi)
		}
	}
}

// acoustic puts Γ of the compressible fluid inside, that of a tube which moves
// across its axis; the liquid around is taken as incompressible.
func (p *pipe) acoustic(s *scale.Set, g *group.Set, fw float64) {
	ka := math.Pi * fw * p.d / s.X(scale.SoundSpeed)
	if math.IsNaN(ka) {
		waitFor(s, g, []scale.ID{scale.FrequencyWet, scale.SoundSpeed}, group.AcousticInertia, group.AcousticDamping)
		return
	}
	share := 1.0
	if p.outside > 0 {
		share = p.content / (p.outside + p.content)
	}
	g.Put(group.AcousticInertia, 1+share*(sideways(ka)-1))
	g.Put(group.AcousticDamping, 0)
}

// sideways is the mass of compressible fluid in a rigid tube that moves across
// its axis, over the mass of the fluid.
//
//	Γ = J₁(ka)/(ka J₁′(ka))
//
// Symbols: ka [1], wave number of sound times inner radius. Range: ka ≥ 0; from
// 1.8 on, near the first cross mode at 1.8412, the value there. Accuracy: exact.
// Check: ka 0.1: 1.002507; 1.5: 2.59. Source: the potential (x, J₁ cos θ) of the
// Helmholtz equation with the speed of the wall; Junger & Feit 1986 for the outside.
func sideways(ka float64) float64 {
	ka = math.Min(ka, 1.8)
	if ka < 1e-4 {
		return 1
	}
	j1 := math.J1(ka)
	return j1 / (ka*math.J0(ka) - j1)
}

// strokeAround puts the Keulegan–Carpenter number of the liquid around.
func (p *pipe) strokeAround(s *scale.Set, g *group.Set) {
	around := s.Has(scale.ExternalDensity)
	amplitude := s.X(scale.Amplitude)
	switch {
	case !around:
		return
	case math.IsNaN(p.outer):
		waitFor(s, g, []scale.ID{scale.Thickness}, group.KeuleganCarpenter)
	case math.IsNaN(amplitude):
		g.Miss(group.KeuleganCarpenter, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: p.outer / (2 * math.Pi), Power: 1})
	default:
		g.Put(group.KeuleganCarpenter, 2*math.Pi*amplitude/p.outer)
	}
}

// waves puts the groups of the column of fluid.
func (p *pipe) waves(s *scale.Set, g *group.Set) {
	a, c := s.X(scale.WaveSpeed), s.X(scale.SoundSpeed)
	compliance := p.c1 * s.X(scale.Density) * c * c * p.d / (s.X(scale.Young) * s.X(scale.Thickness))
	needs := []scale.ID{scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young}
	putOrWait(s, g, group.WallCompliance, compliance, needs...)
	putOrWait(s, g, group.WaveSpeedRatio, a/c, needs...)
	fw := s.X(scale.FrequencyWet)
	if !g.Is(group.StaticOnly) {
		putOrWait(s, g, group.WaveDiameter, fw*p.d/a, append([]scale.ID{scale.FrequencyWet}, needs...)...)
		p.resonance(s, g, fw)
	}
	p.axial(s, g, a)
}

// columnModes are the acoustic modes that are held against the bending mode:
// pulsation is strong in the lowest ones, and higher ones lie so dense that one
// is always near.
const columnModes = 3

// resonance puts the nearest acoustic mode of the column.
func (p *pipe) resonance(s *scale.Set, g *group.Set, fw float64) {
	first := s.X(scale.ColumnFrequency)
	if math.IsNaN(fw / first) {
		waitFor(s, g, []scale.ID{scale.FrequencyWet, scale.ColumnFrequency, scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young, scale.ColumnLength}, group.ColumnFrequency, group.ColumnMode)
		return
	}
	best, mode := fw/first, 1
	for j := 2; j <= columnModes; j++ {
		ratio := fw / (first * p.columnRatio(j))
		if math.Abs(math.Log(ratio)) < math.Abs(math.Log(best)) {
			best, mode = ratio, j
		}
	}
	g.Put(group.ColumnFrequency, best)
	g.Put(group.ColumnMode, float64(mode))
}

// columnRatio is the frequency of acoustic mode j over that of the first.
func (p *pipe) columnRatio(j int) float64 {
	if p.quarter {
		return float64(2*j - 1)
	}
	return float64(j)
}

// axial puts the Poisson coupling of the column with the wall.
func (p *pipe) axial(s *scale.Set, g *group.Set, a float64) {
	if p.heldThroughout {
		return
	}
	nu, bar := s.X(scale.Poisson), s.X(scale.Young)/s.X(scale.SolidDensity)
	kappa := 4 * nu * nu * p.content / s.X(scale.DryMass)
	x := kappa * a * a / math.Max(bar-a*a, 1e-3*bar)
	putOrWait(s, g, group.AxialCoupling, x, scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young, scale.SolidDensity, scale.DryMass)
}

// flow puts what the mean flow inside makes.
func (p *pipe) flow(s *scale.Set, g *group.Set) {
	for _, id := range []group.ID{group.StaticDeflection, group.StaticDeflectionInterest, group.StaticDeflectionSpan} {
		g.Put(id, 0) // a straight pipe: the flow inside loads it along its axis only
	}
	if !s.Has(scale.Turbulence) {
		g.Drop(group.TurbulenceIntensity)
	}
	u, l := s.X(scale.Speed), s.X(scale.Span)
	putOrWait(s, g, group.FrictionLoss, math.Min(frictionFactor(g.Get(group.Reynolds), p.roughness)*s.X(scale.ColumnLength)/p.d, mostFriction), scale.Speed, scale.KinematicViscosity, scale.ColumnLength)
	if !g.Is(group.StaticOnly) {
		putOrWait(s, g, group.TransitRatio, s.X(scale.FrequencyWet)*l/u, scale.FrequencyWet, scale.Span, scale.Speed)
		omega := 2 * math.Pi * s.X(scale.FrequencyWet)
		putOrWait(s, g, group.PseudoStatic, 2*omega*l/(math.Pi*u), scale.FrequencyWet, scale.Span, scale.Speed)
	}
	p.convey(s, g, u, l)
}

// convey puts the groups of a pipe that conveys fluid.
func (p *pipe) convey(s *scale.Set, g *group.Set, u, l float64) {
	ei, m := s.X(scale.Bending), s.X(scale.DryMass)
	needs := []scale.ID{scale.Speed, scale.Span, scale.Bending, scale.Density}
	unit := math.Sqrt(ei/p.content) / l
	putOrWait(s, g, group.ConveyingSpeed, u/unit, needs...)
	putOrWait(s, g, group.ConveyingMass, p.content/(p.content+p.outside+m), scale.DryMass, scale.Density, scale.Thickness)
	if p.weight != 0 {
		putOrWait(s, g, group.PipeWeight, p.weight, scale.Span, scale.Bending, scale.DryMass, scale.Density, scale.Thickness)
	}
	if p.squeeze != 0 && !p.flutter {
		putOrWait(s, g, group.PipeCompression, p.squeeze, scale.Span, scale.Bending)
	}
	p.react(s, g, u/unit)
	needs = append(needs, scale.DryMass, scale.Thickness)
	high := s.X(scale.SpeedHigh)
	switch {
	case p.ownWeight:
		g.Put(group.BucklingSpeed, unstableAnyhow)
	case p.flutter:
		putOrWait(s, g, group.FlutterSpeed, high/p.critical, needs...)
	default:
		putOrWait(s, g, group.BucklingSpeed, math.Min(high/p.critical, unstableAnyhow), needs...)
	}
}

// unstableAnyhow is the speed ratio of a pipe that has buckled without flow.
const unstableAnyhow = 1e6

// react puts the stiffness and the damping of the flow inside, by the mode alone
// in the equation of the conveying pipe: the centrifugal term is u²∫φφ″, the
// Coriolis term 2√β u ∫φφ′, which for a free end is 2√β u φ(1)²/2. A mode with
// φ(1)² = 4∫φ² has ∫φφ″ = x(2 − x), x = λσ from ∫φ′² = x(x + 2). Where the flow
// stiffens the mode (the first of a cantilever) its share of the whole
// stiffness is given.
func (p *pipe) react(s *scale.Set, g *group.Set, u float64) {
	stiffness := p.stiffness
	if math.IsNaN(stiffness) {
		stiffness = p.beta4
	}
	needs := []scale.ID{scale.Speed, scale.Span, scale.Bending, scale.Density}
	if !p.flutter {
		putOrWait(s, g, group.FlowStiffness, u*u*p.slope/stiffness, needs...)
		return
	}
	x := math.Sqrt(1+p.slope) - 1
	ratio := u * u * x * (2 - x) / stiffness
	if ratio > 0 {
		ratio /= 1 + ratio
	}
	putOrWait(s, g, group.FlowStiffness, math.Abs(ratio), needs...)
	m := s.X(scale.DryMass)
	l, ei := s.X(scale.Span), s.X(scale.Bending)
	beta := p.content / (p.content + p.outside + m)
	omega := 2 * math.Pi * s.X(scale.FrequencyWet) * l * l * math.Sqrt((p.content+p.outside+m)/ei)
	if zeta := 2 * math.Sqrt(beta) * u / omega; !math.IsNaN(zeta) {
		g.Put(group.DampingFlow, zeta)
	}
}

// surges puts what a change of the flow makes.
func (p *pipe) surges(s *scale.Set, g *group.Set) {
	change := s.X(scale.SpeedChange)
	if change == 0 {
		return
	}
	a, l, tc := s.X(scale.WaveSpeed), s.X(scale.ColumnLength), s.X(scale.ClosureTime)
	needs := []scale.ID{scale.SpeedChange, scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young}
	ratio := tc * a / (2 * l)
	putOrWait(s, g, group.SurgeRatio, ratio, scale.ClosureTime, scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young, scale.ColumnLength)
	if tc > 0 {
		putOrWait(s, g, group.FrontDiameter, p.d/(math.Pi*a*tc), scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young)
	}
	if !math.IsNaN(tc) {
		putOrWait(s, g, group.SurgeDiameter, surgeDiameter(p.d, l, a*tc), scale.ColumnLength, scale.SoundSpeed, scale.Density, scale.Thickness, scale.Young)
	}
	sudden := s.X(scale.Density) * a * change
	gauge := s.X(scale.Pressure) - s.X(scale.AmbientPressure)
	switch {
	case !p.pressureGiven:
		for _, id := range []group.ID{group.SurgePressure, group.SurgeSudden} {
			g.Miss(id, group.Need{Input: FluidPressure.Path(), Unit: "Pa"})
		}
	default:
		// where nothing presses inside, any surge exceeds its share of it
		against := math.Max(gauge, 1e-6*s.X(scale.Pressure))
		p.putSurge(s, g, group.SurgePressure, group.SurgeSudden, sudden/against, ratio, needs)
	}
	if g.Is(group.Gas) {
		return
	}
	apart := math.Max(s.X(scale.Pressure)-s.X(scale.VapourPressure), 1e-6*s.X(scale.Pressure))
	p.putSurge(s, g, group.ColumnSeparation, group.ColumnSeparationSudden, sudden/apart, ratio, append(needs, scale.VapourPressure))
}

// surgeDiameter is the bore over the length of the pressure wave that a change of
// the flow makes.
//
//	D/λ, λ = 2(2ℓ_c + a t_c)
//
// Symbols: D bore (m), ℓ_c length of the column (m), a t_c length of the front
// (m). The pressure at the valve lasts 2ℓ_c/a + t_c, which is half a period; for a
// closure at once λ is the period 4ℓ_c/a of the water hammer. The front alone is
// no measure: radial inertia smooths the steepest one over a few bores, and the
// mean pressure of the section behind it is that of the balance of momentum, ρaΔU,
// however fast the valve is. Range: ℓ_c > 0, t_c ≥ 0. Accuracy: a threshold; for
// some bores behind a front that is shorter than the bore the pressure rings about
// its mean, in an undamped tube 27 % above it (the integral of Airy's function).
// Check: D 0.5, ℓ_c 2000, t_c 0: 6.25e-5. Source: Wylie & Streeter 1993; Skalak
// 1956 for the front, both from memory.
func surgeDiameter(bore, column, front float64) float64 {
	return bore / (4*column + 2*front)
}

// putSurge puts a pressure ratio of a sudden change, and that of the change at
// its own speed; where only the time of it is missing it says how the ratio
// follows from it.
func (p *pipe) putSurge(s *scale.Set, g *group.Set, slow, sudden group.ID, ratio, closure float64, needs []scale.ID) {
	putOrWait(s, g, sudden, ratio, needs...)
	switch {
	case math.IsNaN(ratio):
		waitFor(s, g, needs, slow)
	case s.Has(scale.ClosureTime) && s.X(scale.ClosureTime) == 0:
		g.Put(slow, ratio)
	case !math.IsNaN(closure):
		g.Put(slow, ratio/math.Max(1, closure))
	case !s.Has(scale.ClosureTime):
		n := group.Need{Input: s.Needs(scale.ClosureTime), Unit: "s"}
		if back := 2 * s.X(scale.ColumnLength) / s.X(scale.WaveSpeed); !math.IsNaN(back) {
			n.Coefficient, n.Power = ratio*back, -1
		}
		g.Miss(slow, n)
	default:
		waitFor(s, g, []scale.ID{scale.ColumnLength}, slow)
	}
}

// mostFriction is the friction loss of a flow that hardly moves.
const mostFriction = 1e9

// frictionFactor is Darcy's friction factor of a bore.
//
//	f = 64/Re laminar; 1/√f = −1.8 log₁₀[(k/(3.7D))^1.11 + 6.9/Re] turbulent
//
// Symbols: re = UD/ν [1]; roughness = k/D [1]. Range: Re > 0, k/D ≤ 0.05;
// between Re 2300 and 4000 the turbulent one, which is the larger. Accuracy: 2 %
// turbulent, exact laminar. Check: Re 1e5, smooth: 0.0180; k/D 1e-3: 0.0222.
// Source: Haaland 1983; White 2006 (from memory).
func frictionFactor(re, roughness float64) float64 {
	if re <= 2300 {
		return 64 / re
	}
	root := -1.8 * math.Log10(math.Pow(roughness/3.7, 1.11)+6.9/re)
	return 1 / (root * root)
}
