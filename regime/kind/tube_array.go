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

// The fields of a tube array that a cylinder does not have.
var (
	tubePitch      = quantity("pitch", units.Length, "gt=0", "distance between the axes of neighbouring tubes", "")
	tubePitchRatio = pure("pitch_ratio", "gt=1,lte=20", "pitch over diameter, in place of the pitch", "")
	tubeLayout     = choice("layout", "layout angle in degrees: 30 triangle, 60 rotated triangle, 90 square in line, 45 rotated square", "30", "30", "45", "60", "90")
	tubeWet        = pure("damping_ratio_wet", "gt=0,lt=1", "damping ratio of a tube in the fluid at rest, structural and fluid together, as measured", "structural damping and that of the fluid")
	tubeSpans      = whole("spans", "gte=2,lte=1000", "number of spans of a tube, for a typical damping where none is given", "")
	tubePlate      = quantity("support_thickness", units.Length, "gt=0", "thickness of the support plates, for a typical damping where none is given", "")
	tubeVoid       = pure("void_fraction", "gte=0,lt=1", "volume of gas over volume of the mixture around the tubes; the fluid then is its liquid", "0: one phase")
	tubeGas        = quantity("gas_density", units.Density, "gt=0", "density of the gas of a two-phase mixture", "")
	tubeDuct       = quantity("duct_width", units.Length, "gt=0", "width of the duct or shell across the flow and across the tubes", "")
	tubeStrouhal   = pure("strouhal", "gt=0,lte=2", "Strouhal number on diameter and speed in the gaps", "by layout and pitch ratio")
	tubeLift       = pure("lift_coefficient", "gt=0", "r.m.s. unsteady lift coefficient on the speed in the gaps", "0.075")
	tubeDrag       = pure("drag_coefficient", "gt=0", "mean drag coefficient on the speed in the gaps", "0.5")
)

// TubeArray is a tube among tubes in cross flow: heat exchanger, steam
// generator, condenser.
var TubeArray = &Kind{
	Name:  "tube_array",
	Title: "Tube array",
	Doc:   "one span of a tube in a bundle across a flow: fluidelastic instability, shedding, sound across the shell, two-phase damping",
	Fields: modal(elastic(cylDiameter, cylRadius, tubePitch, tubePitchRatio, tubeLayout, cylLength, cylWall, cylMass, cylBending, cylContents, cylContentsDry,
		cylSupport, cylTension, cylEndStiffness, cylMode, cylHeld, tubeWet, tubeSpans, tubePlate, tubeVoid, tubeGas, tubeDuct, tubeStrouhal, tubeLift, tubeDrag)...),
	Directions: []string{"cross"},
	Gaps:       true,
	New:        newTubeArray,
}

// tubeArray is a cylinder whose neighbours stand around it as a shell does.
type tubeArray struct {
	cylinder
	pitch      float64 // P/D
	layout     string
	void       float64
	liquid     float64 // density of the liquid
	zetaFluid  float64 // damping by the fluid at rest, two phases included; NaN where not known
	zetaPhases float64
	zeta       float64 // damping in the fluid at rest, NaN where not known
	atLeast    bool    // the structural damping is not known and left out of zeta
	criticalV  float64
	duct       float64 // f_v/f_a at the worst speed and mode, NaN without a duct
	ductMode   int
	soundSpeed float64 // c/√(1 + σ)
	highestFv  float64 // highest shedding frequency in operation
}

// Kinds of lift, drag and turbulence inside a bundle, on the speed in the gaps.
const (
	tubeLiftDefault = 0.075 // r.m.s., pitch ratio 1.2 to 1.6 (Pettigrew & Taylor 2003, from memory)
	tubeDragDefault = 0.5   // pressure drop of 0.3 dynamic pressures a row over the frontal area (Žukauskas 1972, from memory)
	tubeTurbulence  = 0.25  // behind the second row (Žukauskas 1972, from memory)
	tubeSuction     = 1.2   // as behind a single cylinder, on the speed in the gaps
)

func newTubeArray(r *Resolver) Physics {
	t := &tubeArray{cylinder: cylinder{shell: math.NaN(), cover: math.NaN(), bucklingU: math.NaN(), flutterU: math.NaN(), axialMass: math.NaN(), massRatio: math.NaN(), wet: 1},
		zetaFluid: math.NaN(), zeta: math.NaN(), criticalV: math.NaN(), duct: math.NaN(), highestFv: math.NaN()}
	if !t.diameter(r) || !t.layOut(r) {
		return t
	}
	t.phases(r)
	t.speeds(r)
	t.supports(r)
	r.trait(group.Array)
	r.closeGroups()
	if r.Has(scale.Speed) {
		r.derive(scale.FreeSpeed, r.X(scale.Speed)*(1-1/t.pitch), units.Speed, "the speed in the gaps times (P − D)/P")
	}
	r.damping()
	r.material()
	t.masses(r)
	r.derive(scale.Gap, t.d*(t.pitch-1), units.Length, "P − D")
	t.frequencies(r)
	t.dampInFluid(r)
	t.motion(r)
	if r.Is(group.Cross) {
		t.flow(r)
	}
	t.strain(r)
	return t
}

// layOut resolves pitch and layout, and the shell that stands for the
// neighbours in the still fluid.
func (t *tubeArray) layOut(r *Resolver) bool {
	p, ratio := r.c.X(tubePitch), r.c.X(tubePitchRatio)
	switch {
	case math.IsNaN(p) && math.IsNaN(ratio):
		r.violations.Add(tubePitch.Pointer(), input.MissingField, "A tube array needs a pitch (or a pitch ratio).", nil)
		return false
	case math.IsNaN(p):
		t.pitch = ratio
		r.derive(scale.Pitch, ratio*t.d, units.Length, "pitch ratio times diameter")
	default:
		t.pitch = p / t.d
		r.Put(scale.Pitch, p, units.Length, scale.Given, "")
		if !math.IsNaN(ratio) && math.Abs(ratio/t.pitch-1) > 1e-3 {
			r.contradict(tubePitchRatio, "The pitch ratio is not the pitch over the diameter.")
		}
	}
	if !(t.pitch > 1+1e-6) || t.pitch > 1e6 {
		r.contradict(tubePitch, "The pitch is no larger than the diameter, or a million times as large: the tubes are no array.")
		return false
	}
	t.layout = r.c.Choice(tubeLayout, "30")
	if !r.c.Has(tubeLayout) {
		r.warn(tubeLayout, "assumed", "The layout is taken as the triangular one of 30°.")
	}
	for _, f := range []*input.Field{WallGap, ShellDiameter, DepthBelowSurface} {
		if r.c.Has(f) {
			r.warn(f, "not-used", "A tube inside an array is bounded by its neighbours: "+f.Path()+" is not used.")
		}
	}
	for _, id := range []scale.ID{scale.WallGap, scale.Depth} {
		*r.Value(id) = scale.Value{X: math.NaN()}
	}
	r.derive(scale.ShellDiameter, confinement(t.layout, t.pitch)*t.d, units.Length, "shell that stands for the neighbours")
	return true
}

// confinement is the diameter of the shell whose added mass a tube among tubes
// has, over its own.
//
//	D_e/D = (0.96 + 0.5 P/D) P/D for triangles, (1.07 + 0.56 P/D) P/D for squares
//
// Symbols: P/D pitch ratio; added mass ((D_e/D)² + 1)/((D_e/D)² − 1) ρπD²/4.
// Range: P/D 1.2 to 1.8 measured; tends to a free tube beyond. Accuracy: 10 % of
// the added mass. Check: P/D 1.5, triangle: 2.565. Source: Rogers, Taylor &
// Pettigrew 1984; Pettigrew & Taylor 2003, from memory.
func confinement(layout string, pitch float64) float64 {
	if layout == "30" || layout == "60" {
		return (0.96 + 0.5*pitch) * pitch
	}
	return (1.07 + 0.56*pitch) * pitch
}

// solidity is the share of the volume of the array that its tubes fill.
//
//	π/(2√3) (D/P)² for triangles, π/4 (D/P)² for squares
//
// Symbols: P/D pitch ratio. Range: P/D > 1. Accuracy: exact. Check: triangle,
// P/D 1: 0.9069. Source: geometry.
func solidity(layout string, pitch float64) float64 {
	if layout == "30" || layout == "60" {
		return math.Pi / (2 * math.Sqrt(3)) / (pitch * pitch)
	}
	return math.Pi / 4 / (pitch * pitch)
}

// arrayStrouhal is the Strouhal number of shedding among tubes, on the diameter
// and the speed in the gaps.
//
//	St = D/(aP), a = 1.73 at 30°, 1.16 at 60°, 2 at 45° and 90°
//
// Symbols: P pitch, D diameter. Range: P/D 1.2 to 2.5, held within 0.1 and 1
// outside. Accuracy: 25 %; several frequencies may compete in one array. Check:
// P/D 1.5: 0.385, 0.575, 0.333. Source: Weaver, Fitzpatrick & ElKashlan 1987, from
// memory; the speed meant there is that in the gaps, since only so does it
// agree with the 0.33 to 0.67 of Pettigrew & Taylor 2003.
func arrayStrouhal(layout string, pitch float64) float64 {
	a := map[string]float64{"30": 1.73, "60": 1.16}[layout]
	if a == 0 {
		a = 2
	}
	return math.Max(0.1, math.Min(1/(a*pitch), 1))
}

// strouhalSpread is the factor by which the Strouhal number of an array may
// differ from arrayStrouhal either way.
const strouhalSpread = 1.25

// phases replaces the density and the speed of sound of the liquid by those of
// the mixture.
func (t *tubeArray) phases(r *Resolver) {
	t.liquid = r.X(scale.Density)
	t.void = r.c.X(tubeVoid)
	if !(t.void > 0) || !r.Is(group.Fluid) {
		t.void = 0
		return
	}
	gas := r.c.X(tubeGas)
	switch {
	case r.Is(group.Gas):
		r.contradict(tubeVoid, "The fluid of a two-phase mixture is its liquid; the one given is a gas.")
		return
	case math.IsNaN(gas):
		r.violations.Add(tubeGas.Pointer(), input.MissingField, "A two-phase mixture needs the density of its gas.", nil)
		return
	}
	r.trait(group.TwoPhase)
	r.take(scale.GasDensity, tubeGas)
	c := r.X(scale.SoundSpeed)
	mixture := t.liquid*(1-t.void) + gas*t.void
	r.derive(scale.Density, mixture, units.Density, "mixture, ρ_ℓ(1 − ε) + ρ_g ε")
	if p := r.X(scale.Pressure); !math.IsNaN(c) {
		r.derive(scale.SoundSpeed, mixtureSound(t.void, mixture, t.liquid*c*c, gasStiffening*p), units.Speed, "mixture, by Wood's formula")
	}
}

// gasStiffening is γ of the gas in a mixture: 1.3 of steam, 1.4 of air.
const gasStiffening = 1.3

// mixtureSound is the speed of sound in a homogeneous mixture.
//
//	1/(ρc²) = ε/(γp) + (1 − ε)/(ρ_ℓ c_ℓ²)
//
// Symbols: ε void fraction, ρ density of the mixture, γp and ρ_ℓc_ℓ² stiffness of
// gas and liquid. Range: bubbles far below the wave length and their
// resonance. Accuracy: 10 %. Check: water with ε = 0.5 of air at 1 bar: 23.7 m/s
// for γ 1.4. Source: Wood 1930; Brennen 1995, from memory.
func mixtureSound(void, density, liquid, gas float64) float64 {
	return 1 / math.Sqrt(density*(void/gas+(1-void)/liquid))
}

// speeds turns the speed of the stream into that in the gaps,
// V_p = U P/(P − D), on which all groups of an array rest.
func (t *tubeArray) speeds(r *Resolver) {
	if !r.Any(group.Flow) {
		return
	}
	contraction := t.pitch / (t.pitch - 1)
	gap, free := r.c.X(FlowGapSpeed), r.c.X(FlowSpeed)
	switch {
	case !math.IsNaN(gap):
		if !math.IsNaN(free) {
			r.throat = contraction
			if math.Abs(free*contraction/gap-1) > 0.02 {
				r.contradict(FlowGapSpeed, fmt.Sprintf("The stream of %s makes %s in the gaps, not %s.",
					units.Format(free, units.Speed), units.Format(free*contraction, units.Speed), units.Format(gap, units.Speed)))
			}
		}
		r.Put(scale.Speed, gap, units.Speed, scale.Given, "the speed in the gaps")
	case r.Has(scale.Speed):
		r.throat = contraction
		r.derive(scale.Speed, r.X(scale.Speed)*contraction, units.Speed, "U P/(P − D), the speed in the gaps")
	default:
		return
	}
	r.operating()
}

// dampInFluid resolves the damping of a tube in the fluid at rest: measured as
// a whole, or structural and of the fluid.
func (t *tubeArray) dampInFluid(r *Resolver) {
	viscous, ratio := t.viscousDamping(r)
	t.zetaPhases = t.twoPhaseDamping(r)
	t.zetaFluid = viscous + t.zetaPhases
	measured := r.c.X(tubeWet)
	if !math.IsNaN(measured) {
		t.zeta = measured
		if !r.Has(scale.Damping) && !math.IsNaN(t.zetaFluid) {
			r.derive(scale.Damping, math.Max(measured-t.zetaFluid, 0)/ratio, units.Dimensionless, "the damping in the fluid less that of the fluid")
		}
		return
	}
	if !r.Has(scale.Damping) {
		t.typicalDamping(r)
	}
	if r.Has(scale.Damping) {
		t.zeta = r.X(scale.Damping)*ratio + t.zetaFluid
		return
	}
	t.zeta, t.atLeast = t.zetaFluid, true
}

// viscousDamping is ζ_v of a tube in its shell of neighbours, and f_w/f.
func (t *tubeArray) viscousDamping(r *Resolver) (zeta, ratio float64) {
	if !r.Is(group.Fluid) {
		return 0, 1
	}
	ratio = r.X(scale.FrequencyWet) / r.X(scale.FrequencyDry)
	nu := r.X(scale.KinematicViscosity)
	gr, gi, err := t.viscous(2 * math.Pi * r.X(scale.FrequencyWet) * t.d * t.d / 4 / nu)
	if err != nil {
		return math.NaN(), ratio
	}
	mu, share := r.X(scale.AddedMass)/r.X(scale.DryMass), t.outside(r.Set)
	return 0.5 * mu * share * gi / (1 + mu*(1+share*(gr-1))), ratio
}

// twoPhaseDamping is the damping that a mixture of liquid and gas adds.
//
//	ζ_TP = 0.04 (ρ_ℓD²/m) f(ε) (1 + (D/D_e)³)/(1 − (D/D_e)²)²;
//	f = ε/0.4 up to 0.4, 1 up to 0.7, 1 − (ε − 0.7)/0.3 beyond
//
// Symbols: ρ_ℓ density of the liquid, m mass per length with contents and added
// mass, ε void fraction, D_e diameter of the shell of neighbours. Range: ε 0 to 1,
// P/D 1.2 to 1.8. Accuracy: a lower bound of measurements that scatter by a factor
// of two. Check: ρ_ℓD²/m = 0.5, ε 0.5, D_e/D = 2: 0.04. Source: Pettigrew & Taylor
// 2003, from memory.
func (t *tubeArray) twoPhaseDamping(r *Resolver) float64 {
	if !r.Is(group.TwoPhase) {
		return 0
	}
	mass := r.X(scale.DryMass) + r.X(scale.AddedMass)
	return phaseDamping(t.liquid*t.d*t.d/mass, t.void, t.shell)
}

func phaseDamping(massNumber, void, shell float64) float64 {
	f := 1.0
	switch {
	case void < 0.4:
		f = void / 0.4
	case void > 0.7:
		f = 1 - (void-0.7)/0.3
	}
	x := 1 / shell
	return 0.04 * massNumber * f * (1 + x*x*x) / math.Pow(1-x*x, 2)
}

// typicalDamping takes a typical damping where the supports are described and
// none is given.
//
//	in gas 0.05 (N − 1)/N √(h/ℓ), at least 0.002; in liquid 0.006 in all
//
// Symbols: N spans, h thickness of the support plates, ℓ span. Range: tubes
// through drilled plates with clearance. Accuracy: a lower bound, measurements
// scatter by a factor of three. Check: N 4, h/ℓ 0.025: 0.00593. Source: Pettigrew
// & Taylor 2003, from memory.
func (t *tubeArray) typicalDamping(r *Resolver) {
	n, h, l := r.c.X(tubeSpans), r.c.X(tubePlate), r.X(scale.Span)
	if math.IsNaN(n*h*l) || !r.Any(group.Gas|group.Liquid) {
		return
	}
	friction := math.Min(math.Max(0.05*(n-1)/n*math.Sqrt(h/l), 0.002), 0.05)
	note := "friction of a tube in its supports, typical lower bound"
	if r.Is(group.Liquid) {
		ratio := r.X(scale.FrequencyWet) / r.X(scale.FrequencyDry)
		friction = math.Max(0.006-t.zetaFluid, 0) / ratio
		note = "what the damping of the fluid lacks of 0.6 %, typical lower bound of tubes in liquid"
	}
	if math.IsNaN(friction) {
		return
	}
	r.Put(scale.Damping, friction, units.Dimensionless, scale.Assumed, note)
	r.warn(tubePlate, "assumed", "The structural damping is taken as "+units.Format(friction, units.Dimensionless)+", a typical lower bound; a measured one is better.")
}

// flow solves what the flow through the gaps makes.
func (t *tubeArray) flow(r *Resolver) {
	if !r.Has(scale.Turbulence) {
		r.Put(scale.Turbulence, tubeTurbulence, units.Dimensionless, scale.Assumed, "a bundle makes its own turbulence")
		r.warn(FlowTurbulence, "assumed", "The turbulence among the tubes is taken as 25 %.")
	}
	t.critical(r)
	t.shedding(r)
	t.resonance(r)
	t.clash(r)
	u := r.X(scale.Speed)
	load := t.wake.drag * r.X(scale.Density) * u * u / 2 * t.d
	factor := t.factors.Mean / t.factors.MeanSquare
	if factor == 0 { // an even mode has no share in a uniform load
		factor = 1
	}
	r.deflect(load, math.Abs(factor), units.ForcePerLength)
}

// massDampingNumber is 2πζm/(ρD²), all in the fluid at rest.
func (t *tubeArray) massDampingNumber(r *Resolver) float64 {
	return 2 * math.Pi * t.zeta * (r.X(scale.DryMass) + r.X(scale.AddedMass)) / (r.X(scale.Density) * t.d * t.d)
}

func (t *tubeArray) critical(r *Resolver) {
	number := t.massDampingNumber(r)
	if math.IsNaN(number) {
		return
	}
	v, err := canon.TubeArrayCritical(math.Max(1e-6, math.Min(number, 1e6)), canon.TubeArrayDesignK)
	if err != nil {
		return
	}
	t.criticalV = v * r.X(scale.FrequencyWet) * t.d
}

// clash gives a tube beyond its critical speed the amplitude at which it meets
// its neighbour half-way.
func (t *tubeArray) clash(r *Resolver) {
	if r.X(scale.SpeedHigh) > t.criticalV && !t.atLeast && !r.Is(group.Amplitude) {
		r.derive(scale.Amplitude, t.d*(t.pitch-1)/2, units.Length, "beyond the critical speed neighbours meet half-way, (P − D)/2")
	}
}

// Lock-in of a tube among tubes: shedding within 30 % of its frequency (ASME
// III Appendix N-1324.1, from memory).
const tubeBandLow, tubeBandHigh = 1 / 1.3, 1 / 0.7

func (t *tubeArray) shedding(r *Resolver) {
	t.wake = wake{shape: canon.SectionBluff, strouhal: r.c.X(tubeStrouhal), drag: tubeDragDefault, lift: tubeLiftDefault, modes: t.modeRatios(r), first: t.n,
		bandLow: tubeBandLow, bandHigh: tubeBandHigh, end: tubeBandHigh, amplitude: math.NaN()}
	if v := r.c.Lookup(tubeLift); v != nil {
		t.wake.lift = v.Q.Value
	} else {
		r.warn(tubeLift, "assumed", "The r.m.s. lift coefficient of shedding among tubes is taken as 0.075.")
	}
	if v := r.c.Lookup(tubeDrag); v != nil {
		t.wake.drag = v.Q.Value
	} else {
		r.warn(tubeDrag, "assumed", "The drag coefficient of a tube among tubes is taken as 0.5.")
	}
	spread := 1.0
	if math.IsNaN(t.wake.strouhal) {
		t.wake.strouhal, spread = arrayStrouhal(t.layout, t.pitch), strouhalSpread
	}
	re := r.reynoldsAt(r.X(scale.Speed))
	if math.IsNaN(re) {
		return
	}
	t.wake.st = t.wake.strouhal
	if re < canon.SheddingOnset {
		t.wake.st, t.wake.solved = 0, true
		return
	}
	t.wake.stLockIn = t.wake.st
	t.highestFv = t.wake.st * spread * r.X(scale.SpeedHigh) / t.d
	fd := r.X(scale.FrequencyWet) * t.d
	if math.IsNaN(fd) {
		return
	}
	t.wake.xLow, t.wake.xHigh = t.wake.st/spread*r.X(scale.SpeedLow)/fd, t.wake.st*spread*r.X(scale.SpeedHigh)/fd
	t.wake.worstMode()
	t.wake.solved = true
	t.wake.amplitude = t.resonantAmplitude(r)
	if t.wake.vibrating() && !r.Is(group.Amplitude) {
		r.derive(scale.Amplitude, t.wake.amplitude*t.d, units.Length, "amplitude in resonance with the shedding")
	}
}

// resonantAmplitude is A/D of a tube in resonance with the shedding, correlated
// along its span, at most half the gap.
//
//	A/D = (4/π) √2 C_L′ (ρD²/m)/(16π² St² ζ)
//
// Symbols: C_L′ r.m.s. lift coefficient, m and ζ in the fluid. Range: A/D well
// below the gap. Accuracy: an upper bound, since shedding is hardly correlated
// deep inside a bundle. Check: C_L′ 0.075, ρD²/m 0.3, St 0.4, ζ 0.015: 0.1069.
// Source: Pettigrew & Taylor 2003, from memory.
func (t *tubeArray) resonantAmplitude(r *Resolver) float64 {
	m := (r.X(scale.DryMass) + r.X(scale.AddedMass)) / (r.X(scale.Density) * t.d * t.d)
	a := 4 / math.Pi * math.Sqrt2 * t.wake.lift / m / (16 * math.Pi * math.Pi * t.wake.st * t.wake.st * t.zeta)
	if math.IsInf(a, 1) {
		a = math.MaxFloat64
	}
	if t.atLeast && a > 0.01 { // more damping would make it less
		return math.NaN()
	}
	return math.Min(a, (t.pitch-1)/2)
}

// resonance finds how near shedding comes to sound that stands across the
// duct: f_a = n c_e/(2W), c_e = c/√(1 + σ).
func (t *tubeArray) resonance(r *Resolver) {
	r.trait(group.Duct)
	r.takeOrNeed(scale.DuctWidth, tubeDuct)
	t.soundSpeed = r.X(scale.SoundSpeed) / math.Sqrt(1+solidity(t.layout, t.pitch))
	first := t.soundSpeed / (2 * r.X(scale.DuctWidth))
	if math.IsNaN(first) || math.IsNaN(t.highestFv) {
		return
	}
	ratio := r.X(scale.SpeedLow) / r.X(scale.SpeedHigh)
	if math.IsNaN(ratio) { // no speed at all
		ratio = 0
	}
	if r.c.Has(tubeStrouhal) {
		t.duct, t.ductMode = nearestWave(t.highestFv*ratio/first, t.highestFv/first)
		return
	}
	t.duct, t.ductMode = nearestWave(t.highestFv*ratio/(strouhalSpread*strouhalSpread)/first, t.highestFv/first)
}

// nearestWave returns which of the waves 1, 2, 3 … a range of frequencies over
// that of the first one comes nearest to, and the ratio there.
func nearestWave(lo, hi float64) (float64, int) {
	const low, high, most = 0.8, 1.25, 20
	best, x, mode := -1.0, hi, 1
	for n := 1; n <= most; n++ {
		y := nearest(lo/float64(n), hi/float64(n), low, high)
		if u := math.Min(y/low, high/y); u > best {
			best, x, mode = u, y, n
		}
	}
	if lo > most { // beyond, the waves lie closer than the band is wide
		n := math.Round(math.Min(lo, 1e9))
		return math.Min(lo/n, 1e9), int(n)
	}
	return x, mode
}

// Groups puts the groups that are the array's own.
func (t *tubeArray) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.3, Viscous: 1.5, Acoustic: 1.5, Flow: 2, Buckling: 1.5, Flutter: 1.5, Stiffening: t.stiffening(), StallPerRadian: 1}
	g.Band = group.Transition{Low: 190, High: 300, Length: group.Reynolds}
	g.Put(group.PitchRatio, t.pitch)
	t.still(s, g)
	t.slender(s, g)
	if g.Is(group.TwoPhase) {
		g.Put(group.VoidFraction, t.void)
		putOrWait(s, g, group.DampingTwoPhase, t.zetaPhases, scale.DryMass, scale.AddedMass, scale.Density)
	}
	if g.Is(group.Cross) {
		t.crossGroups(s, g)
		t.arrayGroups(s, g)
	}
	massDamping(s, g, t.massRatio, t.confined, math.Pi/4)
}

func (t *tubeArray) arrayGroups(s *scale.Set, g *group.Set) {
	g.Drop(group.InlineVelocity)
	g.Drop(group.InlinePosition)
	g.Put(group.SuctionPeak, tubeSuction)
	t.fluidelastic(s, g)
	t.reaction(s, g)
	switch {
	case t.wake.st == 0 && t.wake.solved || g.Is(group.TwoPhase):
	case !math.IsNaN(t.duct):
		g.Put(group.DuctResonance, t.duct)
		g.Put(group.DuctMode, float64(t.ductMode))
	case !s.Has(scale.DuctWidth) && t.highestFv > 0 && t.soundSpeed > 0:
		g.Miss(group.DuctResonance, group.Need{Input: tubeDuct.Path(), Unit: "m", Coefficient: t.soundSpeed / (2 * t.highestFv), Power: 1})
	default:
		waitFor(s, g, []scale.ID{scale.Speed, scale.SpeedHigh, scale.KinematicViscosity, scale.SoundSpeed, scale.DuctWidth}, group.DuctResonance)
	}
}

// fluidelastic puts V_p/V_c. Where the structural damping is not known but that
// of the fluid alone keeps the array stable, the latter stands.
func (t *tubeArray) fluidelastic(s *scale.Set, g *group.Set) {
	number := 2 * math.Pi * t.zeta * (s.X(scale.DryMass) + s.X(scale.AddedMass)) / (s.X(scale.Density) * t.d * t.d)
	ratio := s.X(scale.SpeedHigh) / t.criticalV
	const stable = 1 / 1.5
	switch {
	case math.IsNaN(ratio):
		waitFor(s, g, []scale.ID{scale.SpeedHigh, scale.Speed, scale.FrequencyDry, scale.FrequencyWet, scale.DryMass, scale.Density, scale.KinematicViscosity, scale.Damping},
			group.FluidelasticSpeed, group.ArrayMassDamping)
	case t.atLeast && !(ratio*ratio < 0.1*stable):
		g.Miss(group.FluidelasticSpeed, group.Need{Input: DampingRatio.Path(), Unit: "1"})
		g.Miss(group.ArrayMassDamping, group.Need{Input: DampingRatio.Path(), Unit: "1"})
	default:
		g.Put(group.FluidelasticSpeed, math.Min(ratio, math.MaxFloat64))
		g.Put(group.ArrayMassDamping, number)
	}
}

// reaction puts the flow's stiffness on a tube. Two modes that a circulatory
// stiffness κ couples lose stability at κ/k = 2ζ; since Connors' criterion says
// at which speed, κ/k = (V/V_c)² 2ζ = V²ρ/(πK²f²m), whatever the damping.
func (t *tubeArray) reaction(s *scale.Set, g *group.Set) {
	v, f := s.X(scale.Speed), s.X(scale.FrequencyWet)
	mass := s.X(scale.DryMass) + s.X(scale.AddedMass)
	reduced := v / (canon.TubeArrayDesignK * f)
	needs := []scale.ID{scale.Speed, scale.FrequencyWet, scale.FrequencyDry, scale.DryMass, scale.Density}
	g.Drop(group.FlowStiffness)
	putOrWait(s, g, group.FlowStiffness, reduced*reduced*s.X(scale.Density)/(math.Pi*mass), needs...)
	g.Put(group.DragCoefficient, t.wake.drag)
	zeta := t.wake.drag * s.X(scale.Density) * v * t.d / (4 * 2 * math.Pi * f * mass)
	putOrWait(s, g, group.DampingFlow, zeta, needs...)
	if k := g.Get(group.FlowStiffness); k > 0 {
		g.Put(group.PseudoStatic, 2*zeta/k)
	} else {
		waitFor(s, g, needs, group.PseudoStatic)
	}
}
