package kind

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// The waves.
var (
	WavesHeight = quantity("height", units.Length, "gt=0", "height of a regular wave, trough to crest", "")
	WavesPeriod = quantity("period", units.Time, "gt=0", "period of the wave", "")
	WavesDepth  = quantity("depth", units.Length, "gt=0", "depth of the water", "deep water")
	WavesAirGap = quantity("air_gap", units.Length, "gt=0", "height of the underside of a deck above the still surface", "no deck")
	wavesBlock  = &input.Block{Name: "waves", Title: "Waves", Doc: "regular waves; a sea state goes by a design wave of it", Fields: []*input.Field{WavesHeight, WavesPeriod, WavesDepth, WavesAirGap}}
)

// Height over breaking height by Miche: 0.142 λ tanh kd.
const breakingSteepness = 0.142

// waves takes the waves of a case.
func (r *Resolver) waves() {
	if !r.c.HasBlock("waves") {
		return
	}
	if !r.kind.Waves {
		r.contradict(WavesHeight, "Waves are solved for a cylinder or a floater, not for a "+r.kind.Name+".")
		return
	}
	if !r.Is(group.Fluid) {
		if !r.c.HasBlock("flow") {
			r.violations.Add("/fluid", input.MissingField, "Waves need a fluid.", nil)
		}
		return
	}
	if r.Is(group.Gas) {
		r.contradict(WavesHeight, "Waves run on a liquid, and the fluid is a gas.")
		return
	}
	r.trait(group.Waves)
	r.liquid()
	r.takeOrNeed(scale.WaveHeight, WavesHeight)
	r.derive(scale.FrequencyWave, 1/r.c.X(WavesPeriod), units.Frequency, "one over the period")
	r.Need(scale.FrequencyWave, WavesPeriod.Path())
	r.Value(scale.FrequencyWave).Kind = units.Frequency
	r.take(scale.AirGap, WavesAirGap)
	if !r.take(scale.WaterDepth, WavesDepth) {
		r.warn(WavesDepth, "assumed", "The water is taken as deep.")
	}
	w := seaOf(r.Set)
	r.derive(scale.WaveLength, 2*math.Pi/w.k, units.Length, "ω² = gk tanh kd")
	if w.breaking() > 1 {
		r.warn(WavesHeight, "implausible", "The wave is higher than 0.142 λ tanh kd, where waves break; was a significant height of another period meant?")
	}
}

// liquid takes a fluid whose phase the case does not tell as a liquid: it has a
// surface.
func (r *Resolver) liquid() {
	if r.Is(group.Fluid) && !r.Is(group.Gas) {
		r.trait(group.Liquid)
	}
}

// sea is a regular wave by linear theory.
type sea struct {
	a, omega, k, d float64 // amplitude, angular frequency, wave number, depth (+Inf: deep)
}

// seaOf solves the waves of a case; what is missing is NaN.
func seaOf(s *scale.Set) sea {
	w := sea{a: s.X(scale.WaveHeight) / 2, omega: 2 * math.Pi * s.X(scale.FrequencyWave), d: math.Inf(1)}
	deep := w.omega * w.omega / s.X(scale.Gravity)
	w.k = deep
	if d := s.X(scale.WaterDepth); !math.IsNaN(d) {
		w.d = d
		if kd, err := canon.WaveNumber(deep * d); err == nil && kd > 0 {
			w.k = kd / d
		}
	}
	return w
}

// kd is the wave number times the depth.
func (w sea) kd() float64 { return w.k * w.d }

// decay is the horizontal motion of the water at z ≤ 0 over that at the still
// surface.
//
//	cosh k(z + d)/cosh kd
//
// Symbols: k wave number, d depth, z height above the still surface. Range: −d ≤
// z ≤ 0. Accuracy: linear waves. Check: deep water, z = −λ/2: e^(−π) = 0.0432.
// Source: Dean & Dalrymple 1991, from memory.
func (w sea) decay(z float64) float64 {
	z = math.Max(math.Min(z, 0), -w.d)
	if math.IsInf(w.d, 1) {
		return math.Exp(w.k * z)
	}
	return math.Exp(w.k*z) * (1 + math.Exp(-2*w.k*(w.d+z))) / (1 + math.Exp(-2*w.kd()))
}

// speed is the amplitude of the horizontal speed at the still surface.
//
//	u = aω/tanh kd
//
// Symbols: a amplitude [m], ω [rad/s]. Range: linear waves. Accuracy: to first
// order in ka. Check: H 6 m, T 10 s, d 20 m: 2.43 m/s.
// Source: Dean & Dalrymple 1991, from memory.
func (w sea) speed() float64 { return w.a * w.omega / math.Tanh(w.kd()) }

// breaking is the height over that at which waves break.
//
//	H/(0.142 λ tanh kd)
//
// Symbols: H height, λ wavelength, d depth. Range: regular waves on a flat bed.
// Accuracy: 10 %. Check: deep water: a steepness of 1/7. Source: Miche 1944, from memory.
func (w sea) breaking() float64 {
	return 2 * w.a * w.k / (2 * math.Pi * breakingSteepness * math.Tanh(w.kd()))
}

// second is the second-order over the first-order elevation. The function of
// canon ends at a steepness beyond breaking: the ratio goes on in proportion.
func (w sea) second() float64 {
	ka := w.a * w.k
	at := math.Min(ka, 0.5)
	ratio, err := canon.StokesSecondOrder(at, math.Max(1e-3, math.Min(w.kd(), 1e6)))
	if err != nil || at == 0 {
		return math.NaN()
	}
	return ratio * ka / at
}

// crest is the elevation of the crest to second order, and at most the wave
// height, beyond which the expansion has failed.
func (w sea) crest() float64 { return w.a * (1 + math.Min(w.second(), 1)) }

// groups puts what waves make of a body of a length along them.
func (w sea) groups(s *scale.Set, g *group.Set, length float64) {
	both := []scale.ID{scale.WaveHeight, scale.FrequencyWave}
	putOrWait(s, g, group.Diffraction, length*w.k/(2*math.Pi), scale.FrequencyWave)
	putOrWait(s, g, group.WaveSteepness, w.a*w.k/math.Pi, both...)
	putOrWait(s, g, group.WaveBreaking, w.breaking(), both...)
	putOrWait(s, g, group.SecondOrder, w.second(), both...)
	putOrWait(s, g, group.WaveRatio, s.X(scale.FrequencyWave)/s.X(scale.FrequencyWet), scale.FrequencyWave, scale.FrequencyWet)
	if s.Has(scale.WaterDepth) {
		kd := w.kd()
		putOrWait(s, g, group.RelativeDepth, kd/(2*math.Pi), scale.FrequencyWave)
		putOrWait(s, g, group.Ursell, 8*math.Pi*math.Pi*w.a*w.k/(kd*kd*kd), both...)
	}
	if s.Has(scale.AirGap) {
		putOrWait(s, g, group.CrestClearance, w.crest()/s.X(scale.AirGap), both...)
	}
	putOrWait(s, g, group.DisplacementWave, w.k*s.X(scale.Amplitude), scale.FrequencyWave, scale.Amplitude)
	putOrWait(s, g, group.WaveDeflection, s.X(scale.WaveDeflection)/s.X(scale.AmplitudeInterest), scale.WaveDeflection)
	putOrWait(s, g, group.KeuleganCarpenter, s.X(scale.ParticleSpeed)/(s.X(scale.FrequencyWave)*s.X(scale.Length)), both...)
	r, zeta := g.Get(group.WaveRatio), s.X(scale.Damping)*s.X(scale.FrequencyWet)/s.X(scale.FrequencyDry)
	if daf := magnification(r, zeta); !math.IsNaN(daf) {
		g.Put(group.WaveMagnification, daf)
	} else {
		waitFor(s, g, []scale.ID{scale.FrequencyWave, scale.FrequencyWet, scale.Damping}, group.WaveMagnification)
	}
	g.Drop(group.DisplacementDepth)
	w.speeds(s, g)
}

// speeds puts the groups that know the speed of the water, that of the waves
// with that of a current.
func (w sea) speeds(s *scale.Set, g *group.Set) {
	u := s.X(scale.ParticleSpeed)
	if g.Is(group.Cross) {
		u += s.X(scale.Speed)
	}
	needs := []scale.ID{scale.WaveHeight, scale.FrequencyWave, scale.Speed, scale.KinematicViscosity}
	g.Drop(group.Reynolds)
	putOrWait(s, g, group.Reynolds, u*s.X(scale.Length)/s.X(scale.KinematicViscosity), needs...)
	putOrWait(s, g, group.MotionSpeedRatio, 2*math.Pi*s.X(scale.FrequencyMotion)*s.X(scale.Amplitude)/u, scale.WaveHeight, scale.FrequencyWave, scale.Speed, scale.Amplitude)
	if v := w.a * w.omega; v > 0 {
		putOrWait(s, g, group.SlammingTime, 13*s.X(scale.Length)*s.X(scale.FrequencyWet)/(64*v), scale.FrequencyWet)
	}
}

// morison is the largest of F_D cos|cos| + F_I sin, drag and inertia a quarter
// period apart.
//
//	F_I for F_D ≤ F_I/2; F_D + F_I²/(4 F_D) beyond
//
// Symbols: F_D, F_I amplitudes of drag and inertia. Range: no current. Accuracy: exact.
// Check: F_D = F_I: 1.25 F_I. Source: Morison et al. 1950, from memory.
func morison(drag, inertia float64) float64 {
	if drag <= inertia/2 {
		return inertia
	}
	return drag + inertia*inertia/(4*drag)
}

// magnification is that of a mode at r times its frequency.
//
//	1/√((1 − r²)² + (2ζr)²)
//
// Symbols: r frequency ratio, ζ damping ratio; NaN: not known, which leaves the
// band 0.8 … 1.25 without an answer and elsewhere makes no difference above 1 %
// of it at ζ = 0.05. Range: one mode. Accuracy: exact. Check: r 1, ζ 0.01: 50.
// Source: Timoshenko, Young & Weaver 1974, from memory.
func magnification(r, zeta float64) float64 {
	if math.IsNaN(zeta) {
		if r > 0.8 && r < 1.25 {
			return math.NaN()
		}
		zeta = 0
	}
	return 1 / math.Hypot(1-r*r, 2*zeta*r)
}

// magnifiedAt is the magnification of a mode of frequency f in the waves.
func (r *Resolver) magnifiedAt(f float64) float64 {
	return magnification(r.X(scale.FrequencyWave)/f, r.X(scale.Damping))
}

// movedByWaves puts the deflection by the waves, which is the amplitude of the
// motion where none was given.
func (r *Resolver) movedByWaves(deflection float64, how string) {
	r.Value(scale.WaveDeflection).Kind = units.Length
	r.derive(scale.WaveDeflection, deflection, units.Length, how)
	for _, id := range []scale.ID{scale.WaveHeight, scale.FrequencyWave, scale.Density, scale.KinematicViscosity, scale.DryMass, scale.FrequencyDry, scale.FrequencyWet, scale.Damping} {
		if !r.Has(id) && r.Needs(id) != "" {
			r.Need(scale.WaveDeflection, r.Needs(id))
			break
		}
	}
	if r.Is(group.Amplitude) || !r.Has(scale.WaveDeflection) || deflection < r.X(scale.Amplitude) {
		return
	}
	r.derive(scale.Amplitude, deflection, units.Length, "the deflection by the waves")
}

// Reynolds number at which the drag coefficient of water that hardly moves is
// taken: the drag is nothing there, and its coefficient without bound.
const lowestReynolds = 0.01

// dragOver is the drag over the inertia force, nothing where the water rests.
func dragOver(drag, inertia float64) float64 {
	if drag == 0 && inertia == 0 {
		return 0
	}
	return drag / inertia
}

// inWaves solves the waves across a cylinder: one that stands in the sea and
// pierces its surface, or, with a depth below the surface, one that lies in it.
func (c *cylinder) inWaves(r *Resolver) {
	if r.Is(group.Axial) {
		r.contradict(FlowDirection, "In waves a current is solved across a cylinder, not along it.")
		return
	}
	c.sea = seaOf(r.Set)
	u := c.sea.speed()
	lying := r.c.Has(DepthBelowSurface)
	if lying {
		u *= c.sea.decay(-r.c.X(DepthBelowSurface))
	} else {
		c.standing(r)
	}
	r.derive(scale.ParticleSpeed, u, units.Speed, "aω coth kd, at the still surface or at the depth of the axis")
	if !r.Is(group.Cross) {
		c.wake = wake{shape: canon.SectionCircle, drag: r.c.X(cylDrag), roughness: r.c.X(cylRoughness) / c.d}
	}
	current := 0.0
	if r.Is(group.Cross) {
		current = r.X(scale.Speed)
	}
	c.inertia = 2
	if cm, _, err := canon.CylinderDiffraction(c.sea.k * c.d / 2); err == nil && !lying {
		c.inertia, c.diffracts = cm, true
	}
	inertia := c.inertia * math.Pi * c.d * c.d / 4 * c.sea.omega * u
	drag := c.wake.dragCoefficient(math.Max(r.reynoldsAt(current+u), lowestReynolds)) / 2 * c.d * (current + u) * (current + u)
	c.dragInertia = dragOver(drag, inertia)
	load := r.X(scale.Density) * morison(drag, inertia)
	r.derive(scale.WaveLoad, load, units.ForcePerLength, "Morison's equation: inertia and drag at that level")
	omega := 2 * math.Pi * r.X(scale.FrequencyDry)
	static := load * c.shapeFactor(r, lying) / (r.X(scale.DryMass) * omega * omega)
	r.movedByWaves(static*r.magnifiedAt(r.X(scale.FrequencyWet)), "the wave load on the mode over mω², with dynamic magnification")
}

// standing finds the wetted length of a cylinder that pierces the surface.
func (c *cylinder) standing(r *Resolver) {
	r.trait(group.NearSurface)
	depth := math.Min(orInf(r.X(scale.WaterDepth)), orInf(r.X(scale.Span)))
	r.derive(scale.Depth, depth, units.Length, "the wetted length")
	r.Need(scale.Depth, WavesDepth.Path())
	r.Value(scale.Depth).Kind = units.Length
}

// wettedShare is the depth over the length of a cylinder that stands in waves, 1
// where all of it is wet or the depth is not known.
func (c *cylinder) wettedShare(r *Resolver) float64 {
	if !r.Is(group.Waves) || r.c.Has(DepthBelowSurface) {
		return 1
	}
	if share := r.X(scale.WaterDepth) / r.X(scale.Span); share < 1 {
		return share
	}
	return 1
}

// modalMean is ∫ weight φᵖ dx/∫ φ² dx of the mode, x from the bed over the length, up
// to the end of the wetted part.
func (c *cylinder) modalMean(end float64, power int, weight func(x float64) float64) float64 {
	const panels = 32 // Simpson's rule, 1e-6 for the first modes
	sum := 0.0
	for i := range panels + 1 {
		x := end * float64(i) / panels
		phi := 1.0
		if !c.spring {
			shape, err := canon.BeamShape(c.support, c.n, x)
			if err != nil {
				return math.NaN()
			}
			phi = shape
		}
		term := weight(x) * math.Pow(phi, float64(power))
		switch {
		case i == 0 || i == panels:
		case i%2 == 1:
			term *= 4
		default:
			term *= 2
		}
		sum += term
	}
	return sum * end / (3 * panels) / c.factors.MeanSquare
}

// shapeFactor is the share of the mode in the wave load, whose profile over the
// depth is that of the waves.
func (c *cylinder) shapeFactor(r *Resolver, lying bool) float64 {
	l := r.X(scale.Span)
	if lying || math.IsNaN(l) {
		if c.factors.Mean == 0 {
			return 1 // an even mode has no share in a uniform load; a wave that runs along it has
		}
		return math.Abs(c.factors.Mean / c.factors.MeanSquare)
	}
	end := c.wettedShare(r)
	top := math.Min(orInf(r.X(scale.WaterDepth)), l)
	return math.Abs(c.modalMean(end, 1, func(x float64) float64 { return c.sea.decay(x*l - top) }))
}

// waveGroups puts what waves make.
func (c *cylinder) waveGroups(s *scale.Set, g *group.Set) {
	c.sea.groups(s, g, c.d)
	needs := []scale.ID{scale.WaveHeight, scale.FrequencyWave, scale.Speed, scale.KinematicViscosity}
	putOrWait(s, g, group.DragInertia, c.dragInertia, needs...)
	if c.diffracts {
		putOrWait(s, g, group.DiffractionInertia, c.inertia/2, scale.FrequencyWave)
	}
}

// unused warns of surroundings that mean nothing to a kind.
func (r *Resolver) unused(fields ...*input.Field) {
	for _, f := range fields {
		if r.c.Has(f) {
			r.warn(f, "not-used", "The kind "+r.kind.Name+" does not use "+f.Path()+".")
		}
	}
}
