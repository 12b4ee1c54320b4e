package kind

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/scale"
	"regimed/units"
)

// wake is the flow across a bluff body, solved for shedding, lock-in and drag.
type wake struct {
	shape      canon.SectionShape
	ratio      float64 // length along the flow over width across it, for the tables
	strouhal   float64 // own, NaN where it follows from shape and Reynolds number
	drag       float64 // own, NaN likewise
	lift       float64 // r.m.s. lift coefficient
	roughness  float64 // over the diameter
	modeFactor float64 // γ of the amplitude of the mode shape
	modes      []float64

	first             int     // number of the first of the modes
	st, stLockIn      float64 // at the speed of the flow, and where the first mode would lock in
	xLow, xHigh       float64 // range of St U/(f_w1 D) in operation
	bandLow, bandHigh float64 // of the linear wake oscillator
	end               float64 // of measured lock-in, at least bandHigh
	position, next    float64
	mode              int
	amplitude         float64 // A/D, NaN where not determined
	solved            bool
}

// Unsteady lift of a cylinder in a subcritical wake, r.m.s. over the length:
// measured between 0.2 and 0.5 (Sumer & Fredsøe 2006, from memory); of a smooth
// one in the drag crisis and beyond it about 0.1 (Schewe 1983, from memory).
const defaultLift, supercriticalLift = 0.3, 0.1

// solve computes the wake from the scales: L is the diameter or depth across
// the flow; mass ratio m*, added mass coefficient C_A, and the displaced area
// of the section over D², so that (m + m_a)/(ρD²) = (m* + C_A) area.
func (w *wake) solve(r *Resolver, massRatio, added, area float64) {
	massNumber := (massRatio + added) * area
	re := r.reynoldsAt(r.X(scale.Speed))
	if math.IsNaN(re) {
		return
	}
	st, _, _ := w.strouhalAt(re)
	w.st = st
	fw := r.X(scale.FrequencyWet)
	if st == 0 || math.IsNaN(fw) || math.IsNaN(massNumber) {
		w.solved = st == 0
		return
	}
	d := r.X(scale.Length)
	w.operate(r, fw*d)
	w.stLockIn = w.strouhalNear(r, fw*d)
	// beyond the range of the parameter the band keeps the end that it has there
	am, err := canon.WakeLockInParameter(math.Max(w.stLockIn, 1e-3), math.Max(1e-3, math.Min(massNumber, 1e12)))
	if err != nil {
		return
	}
	w.bandLow, w.bandHigh, err = canon.WakeLockIn(am)
	if err != nil {
		return
	}
	w.end = math.Max(w.bandHigh, lockInEnd(w.stLockIn, massRatio, added))
	w.worstMode()
	w.solved = true
}

// lockInEnd is St U/(f_w D) at the end of the lower branch of measured
// vibrations, which outlasts the band of the linear wake oscillator.
//
//	St·9.25·√((m* + C_A)/(m* − 0.54)); none for m* ≤ 0.54
//
// Symbols: m* mass ratio, C_A added mass coefficient. Range: low mass-damping; a
// heavy damped body stops earlier, which the amplitude decides. Accuracy: 10 %.
// Check: m* = 2.4, St 0.2: 2.5, U* = 12.5; m* = 248: U* = 9.3.
// Source: Govardhan & Williamson 2000, from memory.
func lockInEnd(st, massRatio, added float64) float64 {
	if massRatio <= 0.54 {
		return math.Inf(1)
	}
	return st * 9.25 * math.Sqrt((massRatio+added)/(massRatio-0.54))
}

// reynoldsAt is the Reynolds number of the flow length at a speed.
func (r *Resolver) reynoldsAt(u float64) float64 {
	return u * r.X(scale.Length) / r.X(scale.KinematicViscosity)
}

func (w *wake) strouhalAt(re float64) (st, lo, hi float64) {
	if !math.IsNaN(w.strouhal) {
		if re < canon.SheddingOnset {
			return 0, 0, 0
		}
		return w.strouhal, w.strouhal, w.strouhal
	}
	st, lo, hi, err := canon.Strouhal(math.Min(re, 1e10), w.shape, w.tableRatio())
	if err != nil {
		return math.NaN(), math.NaN(), math.NaN()
	}
	return st, lo, hi
}

// tableRatio is the side ratio within the tables of the shape, whose ends are
// held beyond them.
func (w *wake) tableRatio() float64 {
	lo, hi := 1.0, 2.0
	switch w.shape {
	case canon.SectionRectangle:
		lo, hi = 0.5, 10
	case canon.SectionTee:
		lo = 1.3
	}
	return math.Max(lo, math.Min(w.ratio, hi))
}

// rough reports whether the surface trips the boundary layer.
func (w *wake) rough() bool { return w.roughness >= 1e-4 }

// operate finds the range of St U/(f_w D) of the first mode over the speeds of
// operation. Through the drag crisis the Strouhal number is a band, and its
// upper end can lie inside the range of speeds.
func (w *wake) operate(r *Resolver, fd float64) {
	low, high := r.X(scale.SpeedLow), r.X(scale.SpeedHigh)
	_, lo, _ := w.strouhalAt(r.reynoldsAt(low))
	_, _, hi := w.strouhalAt(r.reynoldsAt(high))
	w.xLow, w.xHigh = lo*low/fd, hi*high/fd
	nu := r.X(scale.KinematicViscosity)
	crisis := canon.DragCrisisEnd * nu / r.X(scale.Length)
	if crisis > low && crisis < high {
		_, _, peak := w.strouhalAt(canon.DragCrisisEnd * (1 - 1e-9))
		w.xHigh = math.Max(w.xHigh, peak*crisis/fd)
	}
}

// strouhalNear is the lowest Strouhal number at the speed of operation that
// comes nearest to a reduced velocity of 5, where a mode of frequency f and
// f·D = fd would lock in: the lowest makes the band widest and the amplitude
// largest.
func (w *wake) strouhalNear(r *Resolver, fd float64) float64 {
	u := math.Max(r.X(scale.SpeedLow), math.Min(5*fd, r.X(scale.SpeedHigh)))
	_, st, _ := w.strouhalAt(r.reynoldsAt(u))
	if st == 0 || math.IsNaN(st) {
		return w.st
	}
	return st
}

// worstMode finds the mode nearest to lock-in at the worst speed of operation,
// and how near the next one comes. Modes are taken as the worst up to one and a
// half times the highest shedding frequency, and the first always; the next one is
// looked for among all of them, since it nears the wake gradually.
func (w *wake) worstMode() {
	best := -1.0
	var order topTwo
	for i, ratio := range w.modes { // ratio: f_w,n/f_w,1
		lo, hi := w.xLow/ratio, w.xHigh/ratio
		x := nearest(lo, hi, w.bandLow, w.end)
		u := math.Min(x/w.bandLow, w.end/x)
		order.add(u)
		if u > best && (i == 0 || hi >= lastShed) {
			best, w.position, w.mode = u, x, i+w.first
		}
	}
	w.next = order.second
}

// lastShed is St U/(f_w D) of a mode at one and a half times the frequency of
// shedding, beyond which no mode is taken as the one that locks in.
const lastShed = 1 / 1.5

// topTwo keeps the two largest of positive values, 0 where there is none.
type topTwo struct{ first, second float64 }

func (t *topTwo) add(v float64) {
	if v > t.first {
		t.first, v = v, t.first
	}
	t.second = math.Max(t.second, v)
}

// nearest returns the value of lo … hi that lies deepest in the band.
func nearest(lo, hi, bandLow, bandHigh float64) float64 {
	centre := math.Sqrt(bandLow * bandHigh)
	if math.IsInf(bandHigh, 1) {
		centre = hi
	}
	return math.Max(lo, math.Min(centre, hi))
}

// Damping ratio above which no structure is expected; a lock-in that even this
// would not stop is certain without knowing the damping.
const highestDamping = 0.2

// amplify finds the amplitude of a locked-in vibration. Where the damping is
// not known but would not matter, the undamped amplitude is taken.
func (w *wake) amplify(r *Resolver, massRatio, addedCoefficient float64) {
	w.amplitude = math.NaN()
	if !w.solved || w.st == 0 || math.IsNaN(massRatio) {
		return
	}
	// ζ on the wet mass times (m* + C_A), for ζ on the dry mass
	lever := math.Sqrt(massRatio * (massRatio + addedCoefficient))
	re := r.reynoldsAt(math.Min(r.X(scale.SpeedHigh), 5*r.X(scale.FrequencyWet)*r.X(scale.Length)))
	at := func(zeta float64) float64 { return vortexAmplitude(zeta*lever, re, w.stLockIn, w.modeFactor) }
	if r.Has(scale.Damping) {
		w.amplitude = at(r.X(scale.Damping))
		return
	}
	if at(highestDamping) > 2*2*0.02 {
		w.amplitude = at(0)
	}
}

// vortexAmplitude is the larger of the published amplitudes.
func vortexAmplitude(alpha, re, st, modeFactor float64) float64 {
	a, err := canon.SkopGriffin(canon.SkopGriffinParameter(st, alpha), modeFactor)
	if err != nil {
		a = 0
	}
	if b, err := canon.GovardhanWilliamson(alpha, re); err == nil {
		a = math.Max(a, b)
	}
	return a
}

// vibrating reports whether lock-in is active, so that its amplitude is that of
// the motion.
func (w *wake) vibrating() bool {
	return w.solved && w.st > 0 && !math.IsNaN(w.amplitude) && w.amplitude > 0.02 &&
		math.Min(w.position/w.bandLow, w.end/w.position) > 1
}

// dragCoefficient of a circle by Reynolds number; of a rough one beyond the
// drag crisis by its roughness.
func (w *wake) dragCoefficient(re float64) float64 {
	if !math.IsNaN(w.drag) {
		return w.drag
	}
	if w.shape != canon.SectionCircle {
		return bluffDrag
	}
	if w.rough() && re > canon.DragCrisisStart {
		return roughDrag(w.roughness)
	}
	cd, _, _, err := canon.CylinderDrag(math.Min(re, 1e8))
	if err != nil {
		return math.NaN()
	}
	return cd
}

// Drag of a bluff body of no particular shape, on its frontal area: a cube or
// a short cylinder (Blevins 1990, from memory).
const bluffDrag = 1.2

// roughDrag is the drag coefficient of a rough cylinder beyond the drag
// crisis.
//
//	C_D = 0.65 for k/D < 1e-4; (29 + 4 log₁₀(k/D))/20 up to 1e-2; 1.05 beyond
//
// Symbols: k roughness height, D diameter. Range: k/D ≥ 0. Accuracy: 15 %.
// Check: k/D = 1e-3 gives 0.85. Source: DNV-RP-C205, section 6.7, from memory.
func roughDrag(k float64) float64 {
	switch {
	case k < 1e-4:
		return 0.65
	case k < 1e-2:
		return (29 + 4*math.Log10(k)) / 20
	default:
		return 1.05
	}
}

// displacementThickness is δ*/ℓ of a plate along the flow at the Reynolds number
// of its length. Below 100, where no layer is thin, it follows the laminar law on,
// which falls short and still tells that an inviscid flow is out of the question.
func displacementThickness(re float64) float64 {
	if re < 100 {
		return 1.72079 / math.Sqrt(math.Max(re, 1e-12))
	}
	layer, err := canon.FlatPlate(math.Min(re, 1e9), re > 5e5)
	if err != nil {
		return math.NaN()
	}
	return layer.DisplacementThickness
}

// groups puts what the wake makes.
func (w *wake) groups(s *scale.Set, g *group.Set) {
	re := s.X(scale.Speed) * s.X(scale.Length) / s.X(scale.KinematicViscosity)
	if math.IsNaN(re) {
		waitFor(s, g, []scale.ID{scale.Speed, scale.Length, scale.KinematicViscosity}, group.Strouhal, group.SheddingRatio, group.DragCoefficient, group.LockInPosition)
		return
	}
	g.Put(group.Strouhal, w.st)
	g.Put(group.DragCoefficient, w.dragCoefficient(re))
	g.Put(group.LiftFluctuation, w.lift)
	if w.st == 0 {
		return
	}
	if !w.solved {
		waitFor(s, g, []scale.ID{scale.FrequencyWet, scale.FrequencyDry, scale.DryMass, scale.DisplacedMass}, group.SheddingRatio, group.LockInPosition)
		return
	}
	g.Put(group.SheddingRatio, w.st*s.X(scale.Speed)/(s.X(scale.FrequencyWet)*s.X(scale.Length)))
	g.Put(group.WakeBandLow, w.bandLow)
	g.Put(group.WakeBandHigh, w.bandHigh)
	g.Put(group.LockInEnd, w.end)
	g.Put(group.LockInPosition, w.position)
	g.Put(group.LockInMode, float64(w.mode))
	if w.next > 0 {
		g.Put(group.LockInNext, w.next)
	}
	if !math.IsNaN(w.amplitude) {
		g.Put(group.VortexAmplitude, w.amplitude)
	} else {
		g.Miss(group.VortexAmplitude, group.Need{Input: s.Needs(scale.Damping), Unit: "1"})
	}
	w.putModes(s, g)
	w.putInline(s, g)
}

func (w *wake) putModes(s *scale.Set, g *group.Set) {
	v := s.X(scale.Speed) / (s.X(scale.FrequencyWet) * s.X(scale.Length))
	if math.IsInf(v, 1) { // a frequency too low to compute with
		return
	}
	for i, ratio := range w.modes {
		if i == group.MaxModes || i > 0 && w.xHigh/ratio < 1/1.5 {
			break
		}
		g.Modes.V[i] = v / ratio
		g.Modes.N = i + 1
	}
}

// putInline puts the position in the in-line band 1 … 4.5 of U/(f_w D).
func (w *wake) putInline(s *scale.Set, g *group.Set) {
	const lo, hi = 1.0, 4.5
	low, high := s.X(scale.SpeedLow), s.X(scale.SpeedHigh)
	fd := s.X(scale.FrequencyWet) * s.X(scale.Length)
	best := -1.0
	for i, ratio := range w.modes {
		if i > 0 && high/(fd*ratio) < lo/2 {
			break
		}
		v := nearest(low/(fd*ratio), high/(fd*ratio), lo, hi)
		if u := math.Min(v/lo, hi/v); u > best {
			best = u
			g.Put(group.InlineVelocity, v)
			g.Put(group.InlinePosition, u)
		}
	}
}

// waitFor marks groups as waiting for the first absent scale of a list.
func waitFor(s *scale.Set, g *group.Set, from []scale.ID, ids ...group.ID) {
	for _, id := range from {
		if s.Has(id) || s.Needs(id) == "" {
			continue
		}
		for _, target := range ids {
			if !g.Has(target) {
				g.Miss(target, group.Need{Input: s.Needs(id), Unit: s.Value(id).Kind.SI()})
			}
		}
		return
	}
}

// massDamping puts the mass-damping numbers of a section: mass ratio m*, added
// mass coefficient C_A of the section, displaced area over D².
func massDamping(s *scale.Set, g *group.Set, massRatio, addedCoefficient, area float64) {
	if !g.Is(group.Fluid) || !g.Has(group.DampingRatio) && g.State(group.DampingRatio) != group.Missing {
		return
	}
	zeta := s.X(scale.Damping)
	if math.IsNaN(zeta) || math.IsNaN(massRatio) {
		waitFor(s, g, []scale.ID{scale.Damping, scale.DryMass, scale.DisplacedMass}, group.Scruton, group.InlineScruton)
		return
	}
	alpha := zeta * math.Sqrt(massRatio*(massRatio+addedCoefficient))
	g.Put(group.MassDamping, alpha)
	sc := 4 * math.Pi * massRatio * area * zeta
	if g.Is(group.Liquid) {
		// with the added mass, and the damping ratio of the wet oscillator
		sc = 4 * math.Pi * area * alpha
	}
	g.Put(group.Scruton, sc)
	g.Put(group.InlineScruton, math.Min(1.8/math.Max(sc, 1e-12), 1e6))
	if g.Has(group.Strouhal) {
		g.Put(group.SkopGriffin, canon.SkopGriffinParameter(g.Get(group.Strouhal), alpha))
	}
}

// deflect puts the static deflection under a load per reference of the mass
// that the mode shares with shape factor: δ = q·factor/(m ω²).
func (r *Resolver) deflect(load, factor float64, loadKind units.Kind) {
	omega := 2 * math.Pi * r.X(scale.FrequencyDry)
	if r.Has(scale.Speed) {
		r.derive(scale.DragPerLength, load, loadKind, "½ρU² C_D and the frontal width")
	}
	r.derive(scale.StaticDeflection, load*factor/(r.X(scale.DryMass)*omega*omega), units.Length, "load over the modal stiffness mω²")
	r.Value(scale.StaticDeflection).Kind = units.Length
	if r.Is(group.StaticOnly) {
		return
	}
	for _, id := range []scale.ID{scale.Speed, scale.DryMass, scale.FrequencyDry, scale.Density} {
		if n := r.Needs(id); n != "" && !r.Has(id) {
			r.Need(scale.StaticDeflection, n)
			return
		}
	}
}

// interestOf puts the displacement against which a static deflection counts.
func (r *Resolver) interestOf() {
	if r.Is(group.Amplitude) && r.X(scale.Amplitude) > 0 {
		r.Put(scale.AmplitudeInterest, r.X(scale.Amplitude), units.Length, scale.Given, "the amplitude of the motion")
		return
	}
	r.Put(scale.AmplitudeInterest, r.X(scale.Length)/100, units.Length, scale.Assumed, "1 % of the flow length")
}
