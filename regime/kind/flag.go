package kind

import (
	"math"
	"slices"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// The fields of a flag.
var (
	flLength    = quantity("length", units.Length, "gt=0", "length along the flow", "")
	flWidth     = quantity("width", units.Length, "gt=0", "width across the flow", "")
	flThickness = quantity("thickness", units.Length, "gt=0", "thickness", "")
	flMass      = quantity("mass_per_area", units.MassPerArea, "gt=0", "mass per area", "density times thickness")
	flBending   = quantity("bending_stiffness", units.BendingStiffnessPlate, "gt=0", "bending stiffness per width", "Eh³/(12(1 − ν²))")
	flEdge      = choice("clamped_edge", "edge that is held: leading, or trailing of an inverted flag", "leading", "leading", "trailing")
	flBody      = quantity("leading_body", units.Length, "gt=0", "diameter of a bluff body that holds the flag, in whose wake it lies", "none: a thin pole or edge")
	flStrouhal  = pure("strouhal", "gt=0,lt=1", "Strouhal number of the leading body on its diameter, with the flag behind it", "by Reynolds number, a circular cylinder")
)

// Flag is a plate clamped at one edge in a flow along it.
var Flag = &Kind{
	Name:       "flag",
	Title:      "Flag",
	Doc:        "a thin plate or sheet clamped at its leading edge in a flow along it, alone or behind a bluff body, or at its trailing edge",
	Fields:     modal(elastic(flLength, flWidth, flThickness, flMass, flBending, flEdge, flBody, flStrouhal)...),
	Directions: []string{"axial", "grazing"},
	New:        newFlag,
}

// flapper holds the solved problems of one flag.
type flapper struct {
	l, width, h float64
	strip       bool // slender: the flow around it is that around a slender body
	inverted    bool
	factors     canon.BeamFactors // of the shape in which it moves
	onset       float64           // flutter speed, divergence speed of an inverted flag
	conveying   float64           // dimensionless speed of a slender flag, NaN else
	beta        float64           // mass share of the fluid of a slender flag
	body        float64           // diameter of the leading body, 0 without
	wake        wake
}

// slenderFlag is width over length below which a flag is a slender body.
const slenderFlag = 0.3

// Amplitudes of what a flag does past an onset, over its length; behind a body
// over the diameter of the body.
const (
	flutterAmplitude  = 0.2  // limit cycles lie between 0.1 and 0.3 (Eloy et al. 2008, from memory)
	invertedAmplitude = 0.85 // peak to peak 1.7 L (Kim et al. 2013, from memory)
	wakeAmplitude     = 0.5  // 0.35 to 0.8 D (Turek & Hron 2006, De Nayer et al. 2014, from memory)
)

func newFlag(r *Resolver) Physics {
	f := &flapper{onset: math.NaN(), conveying: math.NaN(), beta: math.NaN()}
	if !f.shape(r) {
		return f
	}
	r.closeGroups()
	r.damping()
	r.material()
	f.masses(r)
	f.frequencies(r)
	r.interestOf()
	if r.Any(group.Flow) {
		f.stability(r)
		f.behindBody(r)
		f.cycle(r)
		r.Put(scale.StaticDeflection, 0, units.Length, scale.Derived, "a flow along a flat flag has no load across it")
	}
	f.deform(r)
	return f
}

func (f *flapper) shape(r *Resolver) bool {
	f.l, f.width, f.h = r.c.X(flLength), r.c.X(flWidth), r.c.X(flThickness)
	for _, field := range []*input.Field{flLength, flWidth} {
		if !r.c.Has(field) {
			r.violations.Add(field.Pointer(), input.MissingField, "A flag needs length and width.", nil)
		}
	}
	if math.IsNaN(f.l + f.width) {
		return false
	}
	r.take(scale.Length, flLength)
	r.take(scale.Width, flWidth)
	r.takeOrNeed(scale.Thickness, flThickness)
	r.derive(scale.Span, f.l, units.Length, "the length along the flow")
	r.derive(scale.SemiChord, f.l/2, units.Length, "half the length along the flow")
	f.strip = !atMost(slenderFlag*f.l, f.width)
	f.inverted = r.c.Choice(flEdge, "leading") == "trailing"
	r.trait(group.Flexible | group.PanelLike | group.Cantilever | group.ModesDerived)
	f.direction(r)
	for _, field := range []*input.Field{WallGap, ShellDiameter, DepthBelowSurface, BackingDepth} {
		if r.c.Has(field) {
			r.warn(field, "not-used", "A flag is solved in a wide stream: "+field.Path()+" is not used.")
		}
	}
	f.body = r.c.X(flBody)
	if math.IsNaN(f.body) {
		f.body = 0
	}
	if f.body > 0 && f.inverted {
		r.contradict(flBody, "A flag that is clamped at its trailing edge has no leading body.")
	}
	return true
}

// direction makes of a flow along the flag one along a slender body or one over
// a surface: for a flag the two words mean the same.
func (f *flapper) direction(r *Resolver) {
	r.warnings = slices.DeleteFunc(r.warnings, func(w Warning) bool { return w.Pointer == FlowDirection.Pointer() && w.Code == "assumed" })
	if !r.Any(group.Axial | group.Grazing) {
		return
	}
	r.Traits &^= group.Axial | group.Grazing
	if f.strip {
		r.trait(group.Axial)
		return
	}
	r.trait(group.Grazing | group.Streamlined)
}

func (f *flapper) masses(r *Resolver) {
	r.Value(scale.DryMass).Kind = units.MassPerArea
	if !r.take(scale.DryMass, flMass) {
		if r.closeGroups(); !r.Has(scale.DryMass) {
			r.derive(scale.DryMass, r.X(scale.SolidDensity)*f.h, units.MassPerArea, "ρ_s h")
			r.Need(scale.DryMass, flMass.Path())
		}
	}
	rho := r.X(scale.Density)
	r.displace(rho*f.h, units.MassPerArea, "ρh", f.h, flThickness)
	k := f.wave(1)
	r.derive(scale.WaveNumber, k, units.Dimensionless, "1.8751/L of the first mode")
	added := rho * sheetMass(k, f.width)
	r.derive(scale.AddedMassFree, added, units.MassPerArea, "2ρ/k, less what escapes round the sides")
	r.derive(scale.AddedMass, added, units.MassPerArea, "2ρ/k, less what escapes round the sides")
	r.addedNeeds(units.MassPerArea)
	r.derive(scale.ViscousLength, math.Min(f.width/2, 1/k), units.Length, "half the width, 1/k of a wide flag")
	r.closeGroups()
}

// wave is the wave number of the bending mode n.
func (f *flapper) wave(n int) float64 {
	beta, err := canon.BeamMode(canon.ClampedFree, n, 0)
	if err != nil {
		return math.NaN()
	}
	return beta / f.l
}

// sheetMass is the added mass per area over ρ of a sheet of width H, wetted on
// both sides, that is bent in a wave of wave number k.
//
//	m_a/ρ = (2/k)/(1 + 8/(πkH))
//
// Symbols: k wave number, H width. Range: all; wide 2/k, slender πH/4. Accuracy:
// exact at both ends, 20 % between. Check: kH → ∞, k 1: 2; kH 0.01: 0.25 % below
// πH/4. Source: potential flow of a wavy sheet, and of a slender strip.
func sheetMass(k, width float64) float64 { return 2 / k / (1 + 8/(math.Pi*k*width)) }

func (f *flapper) frequencies(r *Resolver) {
	if !r.take(scale.Bending, flBending) {
		nu := r.X(scale.Poisson)
		r.derive(scale.Bending, r.X(scale.Young)*f.h*f.h*f.h/(12*(1-nu*nu)), units.BendingStiffnessPlate, "Eh³/(12(1 − ν²))")
		if math.IsNaN(f.h) {
			r.Need(scale.Bending, flThickness.Path())
		} else {
			r.Need(scale.Bending, Young.Path())
		}
		r.Value(scale.Bending).Kind = units.BendingStiffnessPlate
	}
	k := f.wave(1)
	derived := k * k / (2 * math.Pi) * math.Sqrt(r.X(scale.Bending)/r.X(scale.DryMass))
	r.frequencies(derived, "1.8751²/(2πL²) √(B/m″)", r.gamma(f.viscous))
}

// viscous is Γ of the viscous solution, of the first mode.
func (f *flapper) viscous(freq, nu float64) (gr, gi float64, err error) {
	k := f.wave(1)
	return sheetViscous(k, f.width, 8/(8+math.Pi*k*f.width), freq, nu)
}

// sheetViscous is Γ of the viscous solution of a sheet of wave number k and width
// H that is bent at a frequency, with the share s that the flow round its sides has
// in what limits its added mass.
func sheetViscous(k, width, s, freq, nu float64) (gr, gi float64, err error) {
	re, im, err := ribbon(2 * math.Pi * freq * width * width / 4 / nu)
	if err != nil {
		return 0, 0, err
	}
	layer := k * math.Sqrt(nu/(math.Pi*freq)) / 2
	g := sheetFactor(s, complex(re, -im), complex(1+layer, -layer))
	return real(g), -imag(g), nil
}

// sheetFactor is Γ of a bent sheet of any width, joined of those of a narrow
// ribbon and of a wide sheet as their added masses are.
//
//	1/Γ = s/Γ_r + (1 − s)/Γ_w, s = −∂ln m_a/∂ln(1/m_r)
//
// Symbols: Γ_r of the ribbon, whose ideal added mass per area is m_r = ρπH/4; Γ_w =
// 1 + (1 − i)kδ/2 of Stokes' layer along a wavy sheet, m_w = 2ρ/k; s [1] the share
// of the ribbon: 8/(8 + πkH) where 1/m_a = 1/m_r + 1/m_w. Range: 0 ≤ s ≤ 1.
// Accuracy: exact at both ends, that of the joined masses between. Check: Γ_r =
// Γ_w: the same; s ½: the harmonic mean of the two. Source: as the added mass.
func sheetFactor(s float64, narrow, wide complex128) complex128 {
	return 1 / (complex(s, 0)/narrow + complex(1-s, 0)/wide)
}

// stability finds the speed at which the flag loses stability: flutter of a
// flag clamped at its leading edge, divergence of an inverted one.
func (f *flapper) stability(r *Resolver) {
	b, m, rho := r.X(scale.Bending), r.X(scale.DryMass), r.X(scale.Density)
	switch {
	case math.IsNaN(b*m*rho) || !(rho > 0):
	case f.inverted:
		f.onset = math.Sqrt(invertedOnset(f.width/f.l) * b / (rho * f.l * f.l * f.l))
	default:
		f.onset = f.flutterOnset(b, m, rho)
		f.conveys(b, m, rho, r.X(scale.Speed))
	}
}

// wideFlag is width over length from which on a flag flutters as a wide one.
const wideFlag = 1

// flutterOnset is the speed at which a flag flutters: that of a slender body up to
// H/L 0.3, that of waves on a sheet from 1 on. Between them it goes from one to the
// other as a power of H/L, since measured onsets vary smoothly with the width
// (Eloy et al. 2008, from memory) where the two theories lie up to a factor of
// three apart.
func (f *flapper) flutterOnset(b, m, rho float64) float64 {
	share := within(math.Log(f.width/f.l/slenderFlag)/math.Log(wideFlag/slenderFlag), 0, 1)
	onset := 1.0
	if share < 1 {
		onset = math.Pow(f.slenderOnset(b, m, rho), 1-share)
	}
	if share > 0 {
		onset *= math.Pow(f.wideOnset(b, m, rho), share)
	}
	return onset
}

// wideOnset is that of waves on a sheet, NaN where it is not known.
func (f *flapper) wideOnset(b, m, rho float64) float64 {
	ratio := math.Max(1e-6, math.Min(rho*f.l/m, 1e6))
	u, err := canon.FlagCritical(ratio, math.Max(1e-3, math.Min(f.width/f.l, 1e9)))
	if err != nil {
		return math.NaN()
	}
	return u / f.l * math.Sqrt(b/m)
}

// invertedOnset is κ = ρU²L³/B at which a plate clamped at its trailing edge
// diverges.
//
//	κ = 1.85 (1 + 2L/H)
//
// Symbols: H width, L length, B bending stiffness per width. Range: H/L above
// 0.3. Accuracy: a factor of 1.5 in κ. Check: H/L 1.3: κ 4.7, measured 3.3 to 5.
// Source: Sader et al. 2016, from memory, with the lift slope of a finite wing.
func invertedOnset(aspect float64) float64 { return 1.85 * (1 + 2/aspect) }

// slenderOnset is that of a slender body whose virtual mass πρH²/4 follows it,
// the equation of a cantilevered pipe that conveys fluid; NaN where it is not known.
func (f *flapper) slenderOnset(b, m, rho float64) float64 {
	beta, unit := f.followed(b, m, rho)
	// the solution ends at β 0.95, above which the onset rises further
	u, _, err := canon.ConveyingPipe(math.Max(1e-4, math.Min(beta, 0.95)), 0, 0, canon.PipeCantilever)
	if err != nil {
		return math.NaN()
	}
	return u * unit
}

// followed is the share of the virtual mass in the mass, and the unit of speed of
// the pipe that a slender flag is.
func (f *flapper) followed(b, m, rho float64) (beta, unit float64) {
	virtual := rho * math.Pi * f.width * f.width / 4
	return virtual / (virtual + m*f.width), math.Sqrt(b*f.width/virtual) / f.l
}

// conveys puts the numbers of the pipe that a slender flag is.
func (f *flapper) conveys(b, m, rho, speed float64) {
	if !f.strip {
		return
	}
	beta, unit := f.followed(b, m, rho)
	f.beta, f.conveying = beta, speed/unit
}

// bodyStrouhal is by how much a plate behind a body may lower its Strouhal
// number: 0.11 to 0.2 are measured where the body alone has 0.2 (Apelt & West
// 1975; De Nayer et al. 2014, from memory).
const bodyStrouhal = 0.55

// behindBody solves the shedding of the leading body against the wet modes.
func (f *flapper) behindBody(r *Resolver) {
	if f.body == 0 {
		return
	}
	r.Put(scale.BodyDiameter, f.body, units.Length, scale.Given, "")
	r.trait(group.WakeOfBody)
	f.wake = wake{shape: canon.SectionCircle, strouhal: r.c.X(flStrouhal), first: 1, amplitude: math.NaN()}
	re := r.X(scale.Speed) * f.body / r.X(scale.KinematicViscosity)
	if math.IsNaN(re) {
		return
	}
	f.wake.st, _, _ = f.wake.strouhalAt(re)
	if f.wake.st == 0 {
		f.wake.solved = true
		return
	}
	f.resonate(r)
}

// resonate finds the mode that is nearest to lock-in. The band is that of the
// wake oscillator with the mass that moves, per width, against that of the body.
func (f *flapper) resonate(r *Resolver) {
	first := r.X(scale.FrequencyWet)
	m, rho := r.X(scale.DryMass), r.X(scale.Density)
	if math.IsNaN(first*m*rho) || math.IsNaN(r.X(scale.SpeedHigh)) {
		return
	}
	low := 1.0
	if !r.c.Has(flStrouhal) {
		low = bodyStrouhal
	}
	best := -1.0
	_, _, st := f.wake.strouhalAt(r.X(scale.SpeedHigh) * f.body / r.X(scale.KinematicViscosity))
	if st == 0 || math.IsNaN(st) {
		st = f.wake.st
	}
	var order topTwo
	for n := 1; n <= group.MaxModes; n++ {
		wet := f.wetRatio(n, m, rho) * first
		x := st / (wet * f.body)
		lo, hi := low*x*r.X(scale.SpeedLow), x*r.X(scale.SpeedHigh)
		am, err := canon.WakeLockInParameter(math.Max(1e-3, math.Min(st, 1)), math.Max(1e-3, math.Min((m+rho*sheetMass(f.wave(n), f.width))*f.l/(rho*f.body*f.body), 1e12)))
		if err != nil {
			return
		}
		bandLow, bandHigh, err := canon.WakeLockIn(am)
		if err != nil || math.IsNaN(hi) {
			return
		}
		y := nearest(lo, hi, bandLow, bandHigh)
		u := math.Min(y/bandLow, bandHigh/y)
		order.add(u)
		if u > best && (n == 1 || hi >= lastShed) {
			best, f.wake.position, f.wake.mode = u, y, n
			f.wake.bandLow, f.wake.bandHigh, f.wake.end = bandLow, bandHigh, bandHigh
		}
		f.wake.solved = true
	}
	f.wake.next = order.second
}

// wetRatio is the wet frequency of mode n over that of the first.
func (f *flapper) wetRatio(n int, m, rho float64) float64 {
	k1, kn := f.wave(1), f.wave(n)
	return kn * kn / (k1 * k1) * math.Sqrt((m+rho*sheetMass(k1, f.width))/(m+rho*sheetMass(kn, f.width)))
}

// cycle gives a flag past an onset the amplitude and the shape of its limit
// cycle.
func (f *flapper) cycle(r *Resolver) {
	mode, amplitude, why := 1, math.NaN(), ""
	switch {
	case r.X(scale.SpeedHigh) > f.onset && f.inverted:
		amplitude, why = invertedAmplitude*f.l, "flapping of an inverted flag, 0.85 L"
	case r.X(scale.SpeedHigh) > f.onset:
		mode, amplitude, why = 2, flutterAmplitude*f.l, "limit cycle of a flag, 0.2 L"
		added := r.X(scale.Density) * sheetMass(f.wave(2), f.width)
		f.beats(r, f.wave(2)*r.X(scale.SpeedHigh)/(2*math.Pi)*added/(r.X(scale.DryMass)+added), "flapping at the onset, kU m_a/(2π(m + m_a)) with kL = 4.694")
	case f.locked():
		mode, amplitude, why = f.wake.mode, math.Min(wakeAmplitude*f.body, f.l), "in the wake of the leading body, half its diameter"
		f.beats(r, f.wetRatio(mode, r.X(scale.DryMass), r.X(scale.Density))*r.X(scale.FrequencyWet), "the wet mode that the leading body's shedding meets")
	}
	f.factors, _ = canon.BeamModeFactors(canon.ClampedFree, mode)
	if amplitude > 0 && !r.Is(group.Amplitude) {
		r.derive(scale.Amplitude, amplitude, units.Length, why)
	}
}

// beats puts the frequency of a limit cycle where none is given.
func (f *flapper) beats(r *Resolver, frequency float64, how string) {
	if !r.c.Has(MotionFrequency) {
		r.derive(scale.FrequencyMotion, frequency, units.Frequency, how)
	}
}

func (f *flapper) locked() bool {
	w := &f.wake
	return f.body > 0 && w.solved && w.st > 0 && math.Min(w.position/w.bandLow, w.end/w.position) > 1
}

// deform puts the length over which an amplitude strains.
func (f *flapper) deform(r *Resolver) {
	if f.factors.MaxSlope == 0 {
		f.factors, _ = canon.BeamModeFactors(canon.ClampedFree, 1)
	}
	r.strains(f.l, f.factors.MaxCurvature, f.h, flThickness)
}

// Groups puts the groups that are the flag's own.
func (f *flapper) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.5, Viscous: 1.5, Acoustic: 2, Flow: 2, Buckling: 2, Flutter: 2, StallPerRadian: 1}
	g.Band = group.Transition{Low: 3e5, High: 3e6, Length: group.LengthReynolds}
	f.deformation(s, g)
	if !g.Is(group.Fluid) {
		return
	}
	g.Traits |= group.ViscousSolved
	f.still(s, g)
	g.Put(group.ModeCoupling, 1)
	g.Put(group.NextMode, f.wave(2)*f.wave(2)/(f.wave(1)*f.wave(1)))
	if g.Any(group.Flow) {
		f.flowGroups(s, g)
	}
}

func (f *flapper) deformation(s *scale.Set, g *group.Set) {
	amplitudeOver(s, g, group.DisplacementThickness, f.h)
	amplitudeOver(s, g, group.Slope, f.l/f.factors.MaxSlope)
	g.Drop(group.DisplacementSpan)
	g.Put(group.Slenderness, f.width/f.l)
	if !f.strip {
		g.Drop(group.Slenderness)
	}
	if t := f.h / f.l; !math.IsNaN(t) {
		g.Put(group.ThicknessRatio, t)
	}
}

// still puts the factors of oscillation in fluid at rest. Sound is that of a
// dipole of the smaller of width and length.
func (f *flapper) still(s *scale.Set, g *group.Set) {
	fw, c := s.X(scale.FrequencyWet), s.X(scale.SoundSpeed)
	viscousGroups(s, g, f.viscous)
	soundGroups(s, g, math.Pi*fw/c*math.Min(f.width, f.l), canon.SoundCylinder)
	acousticStep(s, g, 2)
	wavePressure(g, f.wave(1)*f.l)
	rarefaction(s, g, math.Min(f.width, f.l))
}

// flowGroups puts what the flow along the flag makes. A flag that is flat has
// no load; its stiffness in the flow falls as (U/U_c)².
func (f *flapper) flowGroups(s *scale.Set, g *group.Set) {
	g.Put(group.SuctionPeak, 0.1) // a thin sheet along the flow: the ripple of a bent one
	waveLayer(g, f.l, f.wave(1))
	f.bodyGroups(s, g)
	g.Put(group.AspectRatio, f.width/f.l)
	if !math.IsNaN(f.conveying) {
		g.Put(group.ConveyingSpeed, f.conveying)
		g.Put(group.ConveyingMass, f.beta)
	}
	id := group.FlutterSpeed
	if f.inverted {
		id = group.DivergenceSpeed
	}
	needs := []scale.ID{scale.SpeedHigh, scale.Speed, scale.Density, scale.DryMass, scale.Thickness, scale.Bending, scale.Young}
	if math.IsNaN(f.onset) || !s.Has(scale.SpeedHigh) {
		waitFor(s, g, needs, id, group.FlowStiffness, group.PseudoStatic)
		return
	}
	g.Put(id, math.Min(s.X(scale.SpeedHigh)/f.onset, 1e300))
	ratio := s.X(scale.Speed) / f.onset
	g.Put(group.FlowStiffness, math.Min(ratio*ratio, 1e300))
	putOrWait(s, g, group.PseudoStatic, 2*2*math.Pi*s.X(scale.FrequencyWet)/(s.X(scale.Speed)*f.wave(1)), scale.FrequencyWet, scale.FrequencyDry, scale.Speed)
}

// bodyGroups puts the wake of the leading body against the wet modes.
func (f *flapper) bodyGroups(s *scale.Set, g *group.Set) {
	if f.body == 0 {
		return
	}
	g.Band = group.Transition{Low: 190, High: 300, Length: group.BodyReynolds}
	re := s.X(scale.Speed) * f.body / s.X(scale.KinematicViscosity)
	putOrWait(s, g, group.BodyReynolds, re, scale.Speed, scale.KinematicViscosity)
	if math.IsNaN(re) {
		waitFor(s, g, []scale.ID{scale.Speed, scale.KinematicViscosity}, group.Strouhal, group.SheddingRatio, group.LockInPosition)
		return
	}
	g.Put(group.Strouhal, f.wake.st*f.l/f.body) // on the flow length, as every Strouhal number
	if f.wake.st == 0 {
		return
	}
	if !f.wake.solved {
		waitFor(s, g, []scale.ID{scale.FrequencyWet, scale.FrequencyDry, scale.DryMass, scale.Density}, group.SheddingRatio, group.LockInPosition)
		return
	}
	g.Put(group.SheddingRatio, f.wake.st*s.X(scale.Speed)/(s.X(scale.FrequencyWet)*f.body))
	g.Put(group.WakeBandLow, f.wake.bandLow)
	g.Put(group.WakeBandHigh, f.wake.bandHigh)
	g.Put(group.LockInEnd, f.wake.end)
	g.Put(group.LockInPosition, f.wake.position)
	g.Put(group.LockInMode, float64(f.wake.mode))
	if f.wake.next > 0 {
		g.Put(group.LockInNext, f.wake.next)
	}
}
