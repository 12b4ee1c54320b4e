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

// typical is the typical section of a wing or a deck: a strip that plunges and
// twists in a stream.
type typical struct {
	chord      float64
	axis       float64 // elastic axis behind the leading edge, in chords; NaN where not known
	moment     float64 // C_Mα about the elastic axis per radian, on the chord squared; NaN where not known
	lift       float64 // C_Lα per radian, on the chord
	sweep      float64
	cantilever bool    // bends from a root: sweep couples bending to twist
	inUse      bool    // torsion can occur at all
	divergence float64 // U_D; +Inf: none, NaN: not known
	flutter    float64 // U_F; likewise
	given      bool    // the flutter speed was given
	wait       []scale.ID
}

// torsional are the fields of torsion that a section and a wing share.
type torsional struct {
	inertia, frequency, axis, gravity, divergence, flutter *input.Field
}

// take reads the torsion of a typical section. It refuses a moment of inertia
// about the elastic axis that is less than that of the mass in one point.
func (t *typical) take(r *Resolver, f torsional) {
	r.takeOrNeed(scale.InertiaPerLength, f.inertia)
	r.takeOrNeed(scale.FrequencyTorsion, f.frequency)
	r.takeOrNeed(scale.ElasticAxis, f.axis)
	r.takeOrNeed(scale.CentreOfGravity, f.gravity)
	t.axis = r.X(scale.ElasticAxis)
	t.divergence, t.flutter = r.c.X(f.divergence), r.c.X(f.flutter)
	t.given = !math.IsNaN(t.flutter)
	r.take(scale.DivergenceSpeed, f.divergence)
	r.take(scale.FlutterSpeed, f.flutter)
	arm := (r.X(scale.CentreOfGravity) - t.axis) * t.chord
	if i, least := r.X(scale.InertiaPerLength), r.X(scale.DryMass)*arm*arm; i <= least {
		r.contradict(f.inertia, fmt.Sprintf("The moment of inertia about the elastic axis, %s, is no more than the %s of the mass at its centre of gravity.",
			units.Format(i, units.InertiaPerLength), units.Format(least, units.InertiaPerLength)))
	}
}

// solve finds the speeds of divergence and flutter.
func (t *typical) solve(r *Resolver) {
	omega := 2 * math.Pi * r.X(scale.FrequencyTorsion)
	r.derive(scale.TorsionStiffness, r.X(scale.InertiaPerLength)*omega*omega, units.Force, "I_α(2πf_α)²")
	r.Value(scale.TorsionStiffness).Kind = units.Force
	if !t.inUse || !r.Any(group.Flow) {
		return
	}
	if math.IsNaN(t.divergence) {
		t.divergence = t.divergenceSpeed(r)
		r.derive(scale.DivergenceSpeed, t.divergence, units.Speed, "q_D = K_α/(B² C_Mα), of a strip")
	}
	if math.IsNaN(t.flutter) {
		t.flutter = t.flutterSpeed(r)
		r.derive(scale.FlutterSpeed, t.flutter, units.Speed, "a thin aerofoil with plunge and pitch")
	}
}

// divergenceSpeed is the speed at which a strip, or a swept uniform cantilever,
// twists off.
//
//	1/q_D = [C_Mα c² cosΛ/K_α − (3/19)·12.362 C_Lα c sinΛ/(m ℓ ω²)]/√(1 − M²)
//
// Symbols: C_Lα [1/rad] along the stream, that of the section normal to the axis times
// cosΛ; C_Mα = e C_Lα about the elastic axis on c²; K_α torsional
// stiffness of the mode per length [N]; c chord [m]; Λ sweep, aft positive; m ω²
// bending stiffness of the mode per length, ℓ length along the axis [m]; the second
// term is that of a cantilever with EI = m ℓ⁴ω²/12.362. M Mach number. +Inf: none.
// Range: M up to 0.7, whose factor is kept beyond. Accuracy: the sweep 2 % against the
// exact equation between its limits, GJ/ℓ² alone π²/4 and EI alone −19/3.
// Check: Goland's wing with 2π, 252.3 m/s.
// Source: Bisplinghoff, Ashley & Halfman 1955; Diederich & Budiansky 1948; the
// linear form Hodges & Pierce 2011, from memory.
func (t *typical) divergenceSpeed(r *Resolver) float64 {
	if t.moment <= 0 && (!t.cantilever || t.sweep >= 0) {
		return math.Inf(1)
	}
	cos := math.Cos(t.sweep)
	yield := t.moment * t.chord * t.chord * cos / r.X(scale.TorsionStiffness)
	if t.cantilever && t.sweep != 0 {
		omega := 2 * math.Pi * r.X(scale.FrequencyDry)
		yield -= 3.0 / 19 * 12.3624 * t.lift * t.chord * math.Sin(t.sweep) / (r.X(scale.DryMass) * r.X(scale.Span) * omega * omega)
	}
	switch {
	case math.IsNaN(yield):
		return math.NaN()
	case yield <= 0:
		return math.Inf(1)
	}
	return math.Sqrt(2 / (r.X(scale.Density) * yield * t.glauert(r)))
}

// glauert is the factor of the lift slope at the highest speed of operation; 1
// where the speed of sound is not known.
func (t *typical) glauert(r *Resolver) float64 {
	mach := r.X(scale.SpeedHigh) / r.X(scale.SoundSpeed)
	if math.IsNaN(mach) {
		return 1
	}
	m := math.Min(mach, 0.7) * math.Cos(t.sweep)
	return 1 / math.Sqrt(1-m*m)
}

// flutterSpeed is that of a thin aerofoil with plunge and pitch, for the part of
// the stream that is normal to the axis.
func (t *typical) flutterSpeed(r *Resolver) float64 {
	b := t.chord / 2
	m, i := r.X(scale.DryMass), r.X(scale.InertiaPerLength)
	omega := 2 * math.Pi * r.X(scale.FrequencyTorsion)
	mu := m / (math.Pi * r.X(scale.Density) * b * b)
	a, offset := 2*t.axis-1, 2*(r.X(scale.CentreOfGravity)-t.axis)
	r2, ratio := i/(m*b*b), r.X(scale.FrequencyDry)/r.X(scale.FrequencyTorsion)
	if math.IsNaN(mu + a + offset + r2 + ratio) {
		return math.NaN()
	}
	zeta := r.X(scale.Damping)
	if math.IsNaN(zeta) {
		zeta = 0
	}
	zeta = math.Min(zeta, 0.3)
	// beyond the ranges of the solution their ends stand in
	r2 = math.Max(within(r2, 0.01, 4), offset*offset*1.0001)
	speed, _, _, err := canon.SectionFlutter(within(mu, 0.05, 1e4), within(a, -1, 1), within(offset, -1, 1), r2, within(ratio, 0.01, 10), zeta, zeta)
	if err != nil {
		return math.NaN()
	}
	return speed * b * omega / math.Cos(t.sweep)
}

func within(x, lo, hi float64) float64 { return math.Max(lo, math.Min(x, hi)) }

// groups puts what twist and plunge in a stream make.
func (t *typical) groups(s *scale.Set, g *group.Set) {
	u, high := s.X(scale.Speed), s.X(scale.SpeedHigh)
	omega := 2 * math.Pi * s.X(scale.FrequencyTorsion)
	b := t.chord / 2
	if !t.inUse {
		g.Put(group.FlowStiffness, 0)
		return
	}
	t.stiffness(s, g, u, high)
	t.onset(s, g, group.FlutterSpeed, t.flutter, high)
	if k := omega * b / u; !math.IsNaN(k) && !math.IsInf(k, 0) {
		g.Put(group.ReducedFrequencyTorsion, k)
	}
	if ratio := s.X(scale.FrequencyTorsion) / s.X(scale.FrequencyDry); !math.IsNaN(ratio) {
		g.Put(group.TorsionRatio, ratio)
	}
	if index := u / (b * omega) * math.Sqrt(math.Pi*s.X(scale.Density)*b*b/s.X(scale.DryMass)); !math.IsNaN(index) {
		g.Put(group.FlutterIndex, index)
	}
	t.pseudoStatic(s, g)
}

// onset puts the highest speed of operation over a critical one, waits for
// what that follows from, or drops the group where there is none.
func (t *typical) onset(s *scale.Set, g *group.Set, id group.ID, critical, high float64) {
	switch {
	case math.IsInf(critical, 1):
		g.Drop(id)
	default:
		putOrWait(s, g, id, high/critical, t.wait...)
	}
}

// stiffness puts the share of the torsional stiffness that the stream takes,
// q/q_D. A section whose moment turns it back into the stream gets the share that
// makes the same change of its load, κ/(1 + 2κ) for κ/(1 + κ).
func (t *typical) stiffness(s *scale.Set, g *group.Set, u, high float64) {
	t.onset(s, g, group.DivergenceSpeed, t.divergence, high)
	t.divergenceNeed(s, g, high)
	if math.IsInf(t.divergence, 1) {
		q := s.X(scale.Density) * u * u / 2
		kappa := q * t.chord * t.chord * math.Abs(t.moment) / s.X(scale.TorsionStiffness)
		putOrWait(s, g, group.FlowStiffness, kappa/(1+2*kappa), t.wait...)
		return
	}
	ratio := u / t.divergence
	putOrWait(s, g, group.FlowStiffness, ratio*ratio, t.wait...)
}

// divergenceNeed says how the divergence ratio follows from the torsional
// frequency, where that alone is missing.
func (t *typical) divergenceNeed(s *scale.Set, g *group.Set, high float64) {
	if g.State(group.DivergenceSpeed) != group.Missing || g.Need(group.DivergenceSpeed).Input != s.Needs(scale.FrequencyTorsion) || t.sweep != 0 {
		return
	}
	unit := math.Sqrt(2 * s.X(scale.InertiaPerLength) * 4 * math.Pi * math.Pi / (s.X(scale.Density) * t.chord * t.chord * t.moment))
	if c := high / unit; c > 0 {
		g.Miss(group.DivergenceSpeed, group.Need{Input: s.Needs(scale.FrequencyTorsion), Unit: "Hz", Coefficient: c, Power: -1})
	}
}

// pseudoStatic puts the lift by the speed of the motion over that by the twist:
// k for a plunge of a semichord per radian, k_α(½ − a) for a pitch about the axis.
func (t *typical) pseudoStatic(s *scale.Set, g *group.Set) {
	if !g.Has(group.ReducedFrequency) {
		if g.State(group.ReducedFrequency) == group.Missing {
			n := g.Need(group.ReducedFrequency)
			g.Miss(group.PseudoStatic, group.Need{Input: n.Input, Unit: n.Unit})
		}
		return
	}
	k := g.Get(group.ReducedFrequency)
	if g.Has(group.ReducedFrequencyTorsion) {
		arm := 1.0
		if !math.IsNaN(t.axis) {
			arm = math.Abs(1.5 - 2*t.axis)
		}
		k = math.Max(k, g.Get(group.ReducedFrequencyTorsion)*arm)
	}
	g.Put(group.PseudoStatic, k)
}

// confine finds the nearest wall, and the factor of the walls on the added mass
// by the circular cylinder of the same width as a cousin.
func (r *Resolver) confine(width float64) (factor float64, how string) {
	factor = 1
	gap := r.X(scale.WallGap)
	if !math.IsNaN(gap) {
		if c, err := canon.CylinderNearWall(gap / width); err == nil {
			factor, how = c, ", near a wall as a circular cylinder"
		}
	}
	if shell := r.X(scale.ShellDiameter); !math.IsNaN(shell) {
		if q := shell / width; q <= 1 {
			r.contradict(ShellDiameter, "The shell is no wider than the body.")
		} else {
			factor, how = (q*q+1)/(q*q-1), ", in a shell as a circular cylinder"
		}
		gap = math.Min((shell-width)/2, orInf(gap))
	}
	if math.IsNaN(gap) {
		return factor, how
	}
	r.derive(scale.Gap, gap, units.Length, "nearest gap")
	if r.Is(group.Fluid) {
		r.trait(group.Confined)
	}
	return factor, how
}

// strip is the fluid at rest around a slender body that moves across its width.
type strip struct {
	width float64 // normal to the motion: what pushes the fluid
	round bool    // viscous layer of a circle rather than of a thin strip
}

func (p strip) viscous(f, nu float64) (gr, gi float64, err error) {
	stokes := math.Pi * f * p.width * p.width / 2 / nu
	if p.round {
		return canon.OscillatingCylinder(stokes)
	}
	return ribbon(stokes)
}

// groups puts the factors of oscillation in fluid at rest.
func (p strip) groups(s *scale.Set, g *group.Set) {
	if !g.Is(group.Fluid) {
		return
	}
	g.Traits |= group.ViscousSolved
	fw, c := s.X(scale.FrequencyWet), s.X(scale.SoundSpeed)
	viscousGroups(s, g, p.viscous)
	soundGroups(s, g, math.Pi*fw*p.width/c, canon.SoundCylinder)
	if g.Is(group.NearSurface) {
		// a dipole of the strength of a circle of this width, and its image
		x := p.width / s.X(scale.Depth)
		image(g, x*x/8)
	}
	rarefaction(s, g, p.width)
	// both faces push the fluid for a twentieth of a period
	g.Put(group.AcousticStep, 2*s.X(scale.Density)*c*p.width/(20*fw*s.X(scale.DryMass)))
}

// bendingFrequency puts the frequency of bending that the kind's own field gives;
// frequency_dry is the same by its general name.
func (r *Resolver) bendingFrequency(f *input.Field) {
	if !r.c.Has(f) {
		return
	}
	x := r.c.X(f)
	r.Put(scale.FrequencyDry, x, units.Frequency, scale.Given, "")
	if r.c.Has(FrequencyDry) && math.Abs(r.c.X(FrequencyDry)/x-1) > 0.01 {
		r.contradict(f, fmt.Sprintf("%s and %s are the same frequency, and differ.", f.Path(), FrequencyDry.Path()))
	}
}

// nearSurface marks a body that a free surface lies within ten lengths of.
func (r *Resolver) nearSurface(length float64) {
	if d := r.X(scale.Depth); atMost(d, 10*length) && r.Is(group.Fluid) {
		r.trait(group.NearSurface)
	}
}

// tilt puts the largest slope of the mode over the span; absent without a span.
func tilt(s *scale.Set, g *group.Set, slope float64) {
	span := s.X(scale.Span)
	if !s.Has(scale.Span) || !(span > 0) {
		return
	}
	if x := s.X(scale.Amplitude); !math.IsNaN(x) {
		g.Put(group.Slope, slope*x/span)
		return
	}
	g.Miss(group.Slope, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: span / slope, Power: 1})
}

// edgeWake solves the shedding from a blunt trailing edge, whose width takes the
// place of the flow length.
func (r *Resolver) edgeWake(w *wake, width float64) {
	edge := *r
	edge.Set = r.With(scale.Length, width)
	unit := r.X(scale.Density) * math.Pi * width * width / 4
	m, added := r.X(scale.DryMass)/unit, r.X(scale.AddedMass)/unit
	w.solve(&edge, m, added, math.Pi/4)
	w.amplify(&edge, m, added)
	r.Put(scale.SheddingWidth, width, units.Length, scale.Given, "")
}

// bendingAndTorsion are the frequencies of bending and torsion over that of
// bending, dry for wet: the added inertia of torsion is no more than that of
// bending. A ratio that no structure has is left out.
func (r *Resolver) bendingAndTorsion() []float64 {
	if ratio := r.X(scale.FrequencyTorsion) / r.X(scale.FrequencyDry); ratio > 1e-4 && ratio < 1e4 {
		return []float64{1, ratio}
	}
	return []float64{1}
}

// Strouhal number of a blunt trailing edge on its thickness: 0.2 to 0.25 (Blevins
// 1990, from memory).
const edgeStrouhal = 0.22

// gusts puts the background response and the energy at the mode of a slender body
// in turbulent wind.
//
//	B² = 1/(1 + 0.9((b + ℓ)/L)^0.63)
//	S_L = 6.8 f_L/(1 + 10.2 f_L)^(5/3), f_L = n L/U
//	R = 1/η − (1 − e^(−2η))/(2η²), η = 4.6 n x/U for x = ℓ and b
//
// Symbols: b width across the wind [m], ℓ length [m], L length scale of the
// turbulence [m], n natural frequency [Hz], U mean speed [m/s]. Range: any.
// Accuracy: 10 to 20 %; the mode shape counts as uniform. Check: ∫S_L d ln f = 1;
// R → 1 for η → 0. Source: EN 1991-1-4 Annex B, from memory.
func gusts(s *scale.Set, g *group.Set, width float64) {
	if !s.Has(scale.Turbulence) || !g.Is(group.Gas) {
		return
	}
	l, span := s.X(scale.TurbulenceLength), s.X(scale.Span)
	n := s.X(scale.FrequencyWet) / s.X(scale.Speed)
	needs := []scale.ID{scale.TurbulenceLength, scale.Span, scale.Speed, scale.FrequencyWet}
	f := n * l
	energy := 6.8 * f / math.Pow(1+10.2*f, 5.0/3) * sizeReduction(4.6*n*span) * sizeReduction(4.6*n*width)
	putOrWait(s, g, group.GustResonance, energy, needs...)
	putOrWait(s, g, group.GustBackground, 1/(1+0.9*math.Pow((width+span)/l, 0.63)), needs...)
}

// sizeReduction is the loss of correlation of gusts over a length.
func sizeReduction(eta float64) float64 {
	if eta < 1e-3 { // 1 − 2η/3 + η²/3: the closed form cancels
		return 1 - 2*eta/3
	}
	return 1/eta - (1-math.Exp(-2*eta))/(2*eta*eta)
}
