package kind

import (
	"fmt"
	"math"

	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// closeGroups solves for quantities that are missing from the groups that were
// given: each closes the one absent scale of its definition. It may be asked
// again when further scales have become known.
func (r *Resolver) closeGroups() {
	for again := true; again; {
		again = false
		for i := range r.given {
			if g := &r.given[i]; !g.used && r.closeGroup(g) {
				g.used, again = true, true
			}
		}
	}
	if r.Any(group.Flow) {
		r.operating()
	}
}

func (r *Resolver) closeGroup(g *GivenGroup) bool {
	f := FormulaOf(g.ID)
	missing, n := scale.ID(0), 0
	for _, id := range f.From {
		if !r.Has(id) {
			missing, n = id, n+1
		}
	}
	if n != 1 || !closable(missing) {
		return false
	}
	one, two := f.Value(r.With(missing, 1)), f.Value(r.With(missing, 2))
	power := math.Log2(two / one)
	if math.IsNaN(power) || power == 0 {
		return false
	}
	k := r.Value(missing).Kind
	if k == units.Dimensionless {
		k = closedKinds[missing]
	}
	r.derive(missing, math.Pow(g.Value/one, 1/power), k, "from the given "+group.Of(g.ID).Title)
	return r.Has(missing)
}

// closedKinds are the scales that a given group can close, with what they are.
var closedKinds = map[scale.ID]units.Kind{
	scale.Speed: units.Speed, scale.KinematicViscosity: units.KinematicViscosity, scale.SoundSpeed: units.Speed,
	scale.DryMass: units.MassPerLength, scale.FrequencyDry: units.Frequency, scale.FrequencyMotion: units.Frequency,
	scale.Young: units.Modulus, scale.Amplitude: units.Length, scale.Gap: units.Length, scale.SurfaceTension: units.SurfaceTension,
	scale.AddedMass: units.MassPerLength, scale.FrequencyWet: units.Frequency,
}

func closable(id scale.ID) bool {
	_, ok := closedKinds[id]
	return ok
}

// compareGroups holds the groups that closed nothing against the scales.
func (r *Resolver) compareGroups() {
	for i := range r.given {
		g := &r.given[i]
		if g.used {
			continue
		}
		x := FormulaOf(g.ID).Value(r.Set)
		if math.IsNaN(x) {
			continue
		}
		g.used = true
		if math.Abs(x/g.Value-1) > 0.02 {
			name := group.Of(g.ID).ID
			r.violations.Add("/given_groups/"+name, input.Contradiction,
				fmt.Sprintf("given_groups.%s is %.4g, but the quantities of the case make it %.4g.", name, g.Value, x), nil)
		}
	}
}

// frequencies resolves the dry and the wet natural frequency. derived is the
// dry frequency that follows from the structure, NaN where it does not; gamma
// is Γr of the kind as a function of the frequency, nil where it has none.
func (r *Resolver) frequencies(derived float64, how string, gamma func(f float64) float64) {
	if gamma == nil {
		gamma = func(float64) float64 { return 1 }
	}
	mu := r.X(scale.AddedMass) / r.X(scale.DryMass)
	dryGiven, wetGiven := r.take(scale.FrequencyDry, FrequencyDry), r.c.Has(FrequencyWet)
	r.closeGroups()
	switch {
	case dryGiven && !math.IsNaN(derived):
		if f := r.X(scale.FrequencyDry); math.Abs(derived/f-1) > 0.1 {
			r.warn(FrequencyDry, "frequency-differs", fmt.Sprintf("The dry frequency given, %s, differs from the %s that follows from geometry and material.",
				units.Format(f, units.Frequency), units.Format(derived, units.Frequency)))
		}
	case r.Has(scale.FrequencyDry):
	case wetGiven && !r.Is(group.Fluid):
		r.derive(scale.FrequencyDry, r.c.X(FrequencyWet), units.Frequency, "there is no fluid")
	case wetGiven && !math.IsNaN(mu):
		fw := r.c.X(FrequencyWet)
		r.derive(scale.FrequencyDry, fw*math.Sqrt(1+mu*gamma(fw)), units.Frequency, "f_w √(1 + μΓr)")
	case !math.IsNaN(derived):
		r.derive(scale.FrequencyDry, derived, units.Frequency, how)
	}
	r.wet(mu, gamma, wetGiven)
	if !r.take(scale.FrequencyMotion, MotionFrequency) && r.Has(scale.FrequencyWet) {
		r.derive(scale.FrequencyMotion, r.X(scale.FrequencyWet), units.Frequency, "the wet natural frequency")
	}
	r.missingFrequency()
	if r.Is(group.Waves) && !r.c.Has(MotionFrequency) && r.Has(scale.FrequencyWave) {
		r.derive(scale.FrequencyMotion, r.X(scale.FrequencyWave), units.Frequency, "the waves force the motion")
	}
	r.closeGroups()
}

func (r *Resolver) wet(mu float64, gamma func(float64) float64, given bool) {
	if !r.Has(scale.FrequencyDry) {
		if given {
			r.take(scale.FrequencyWet, FrequencyWet)
		}
		return
	}
	f := r.X(scale.FrequencyDry)
	if !r.Is(group.Fluid) {
		r.derive(scale.FrequencyWet, f, units.Frequency, "there is no fluid")
		return
	}
	fw := wetFrequency(f, mu, gamma)
	if !given {
		r.derive(scale.FrequencyWet, fw, units.Frequency, "f/√(1 + μΓr), Γr at the wet frequency")
		return
	}
	r.take(scale.FrequencyWet, FrequencyWet)
	if g := r.X(scale.FrequencyWet); r.c.Has(FrequencyDry) && !math.IsNaN(fw) && math.Abs(fw/g-1) > 0.1 {
		r.warn(FrequencyWet, "frequency-differs", fmt.Sprintf("The wet frequency given, %s, differs from the %s that follows from the dry one and the added mass.",
			units.Format(g, units.Frequency), units.Format(fw, units.Frequency)))
	}
}

// missingFrequency decides what a case without a frequency is: a static one,
// where no dynamic measure is of interest, or one in which the frequency is to
// be asked for.
func (r *Resolver) missingFrequency() {
	for _, id := range []scale.ID{scale.FrequencyDry, scale.FrequencyWet, scale.FrequencyMotion} {
		r.Value(id).Kind = units.Frequency
	}
	if r.Has(scale.FrequencyDry) {
		need := r.massNeed()
		r.Need(scale.FrequencyWet, need)
		r.Need(scale.FrequencyMotion, need)
		return
	}
	i := InterestOf(r.c)
	static := !i.Has(finding.Frequency) && !i.Has(finding.Response) && !i.Has(finding.Stability)
	if static && !r.c.Has(FrequencyWet) && !r.Has(scale.FrequencyMotion) {
		r.trait(group.StaticOnly)
		return
	}
	need := FrequencyDry.Path()
	if r.c.Has(FrequencyWet) {
		need = r.massNeed()
	}
	r.Need(scale.FrequencyDry, need)
	r.Need(scale.FrequencyWet, need)
	r.Need(scale.FrequencyMotion, need)
}

// massNeed is the input that settles the added mass ratio.
func (r *Resolver) massNeed() string {
	for _, id := range []scale.ID{scale.DryMass, scale.AddedMass, scale.Density} {
		if !r.Has(id) {
			if n := r.Needs(id); n != "" {
				return n
			}
		}
	}
	return FluidDensity.Path()
}

// wetFrequency solves f_w = f/√(1 + μΓr(f_w)) by the secant rule in ln f_w; it
// falls back on the plain iteration, which always converges, since Γr falls
// with frequency more slowly than its square.
func wetFrequency(f, mu float64, gamma func(float64) float64) float64 {
	if math.IsNaN(mu) {
		return math.NaN()
	}
	next := func(y float64) float64 { return math.Log(f) - 0.5*math.Log1p(mu*gamma(math.Exp(y))) }
	y0 := math.Log(f) - 0.5*math.Log1p(mu)
	y1 := next(y0)
	for range 60 {
		g0, g1 := next(y0)-y0, next(y1)-y1
		if math.Abs(g1) < 1e-14 || g0 == g1 {
			break
		}
		y2 := y1 - g1*(y1-y0)/(g1-g0)
		if math.IsNaN(y2) || math.Abs(y2-y1) > 5 {
			y2 = y1 + g1
		}
		y0, y1 = y1, y2
		if math.Abs(y1-y0) < 1e-15 {
			break
		}
	}
	return math.Exp(y1)
}

// oscillation is Γ of a viscous solution at a frequency in a fluid of a
// kinematic viscosity.
type oscillation func(f, nu float64) (gr, gi float64, err error)

// gamma is Γr of a viscous solution as a function of the frequency, nil where
// the viscosity is not known.
func (r *Resolver) gamma(solve oscillation) func(f float64) float64 {
	nu := r.X(scale.KinematicViscosity)
	if math.IsNaN(nu) || !r.Is(group.Fluid) {
		return nil
	}
	return func(f float64) float64 {
		gr, _, err := solve(f, nu)
		if err != nil || math.IsNaN(gr) {
			return 1
		}
		return gr
	}
}

// viscousGroups puts Γ of a viscous solution at the wet frequency.
func viscousGroups(s *scale.Set, g *group.Set, solve oscillation) {
	gr, gi, err := solve(s.X(scale.FrequencyWet), s.X(scale.KinematicViscosity))
	if err != nil || math.IsNaN(gr) {
		waitFor(s, g, []scale.ID{scale.FrequencyWet, scale.KinematicViscosity}, group.ViscousInertia, group.ViscousDamping)
		return
	}
	g.Put(group.ViscousInertia, gr)
	g.Put(group.ViscousDamping, gi)
}

// soundGroups puts Γ of an acoustic solution at k₀ times a length.
func soundGroups(s *scale.Set, g *group.Set, ka float64, solve func(ka float64) (gr, gi float64, err error)) {
	if math.IsNaN(ka) {
		waitFor(s, g, []scale.ID{scale.FrequencyWet, scale.SoundSpeed}, group.AcousticInertia, group.AcousticDamping)
		return
	}
	if gr, gi, err := solve(ka); err == nil {
		g.Put(group.AcousticInertia, gr)
		g.Put(group.AcousticDamping, gi)
	}
}

// acousticStep puts the mass that sound reaches in a twentieth of a period from
// a wetted area, over the dry mass.
func acousticStep(s *scale.Set, g *group.Set, area float64) {
	if step := s.X(scale.Density) * s.X(scale.SoundSpeed) * area / (20 * s.X(scale.FrequencyWet) * s.X(scale.DryMass)); !math.IsNaN(step) {
		g.Put(group.AcousticStep, step)
	}
}

// image puts the factors of a surface on the added mass, x more under a lid and
// x less under a surface that gives way.
func image(g *group.Set, x float64) {
	g.Put(group.SurfaceInertiaLid, 1+x)
	g.Put(group.SurfaceInertiaFree, math.Max(1-x, 0))
}

// rarefaction puts the Knudsen number of a gas on a length, or on a narrower gap.
func rarefaction(s *scale.Set, g *group.Set, length float64) {
	if g.Is(group.Liquid) {
		g.Drop(group.Knudsen)
		return
	}
	if s.Has(scale.Gap) {
		length = math.Min(length, s.X(scale.Gap))
	}
	putOrWait(s, g, group.Knudsen, meanFreePath(s)/length, scale.HeatCapacityRatio, scale.KinematicViscosity, scale.SoundSpeed)
}

// amplitudeOver puts the amplitude over a length of the shape that follows from
// the thickness.
func amplitudeOver(s *scale.Set, g *group.Set, id group.ID, over float64) {
	x := s.X(scale.Amplitude)
	switch {
	case math.IsNaN(over):
		waitFor(s, g, []scale.ID{scale.Thickness}, id)
	case math.IsNaN(x):
		g.Miss(id, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: over, Power: 1})
	default:
		g.Put(id, x/over)
	}
}

// strains puts the length over which an amplitude strains a mode of the largest
// curvature curve/l² in a structure of thickness h.
func (r *Resolver) strains(l, curve, h float64, thickness *input.Field) {
	if curve > 0 && !math.IsNaN(h) {
		r.derive(scale.CurvatureLength, l*l/(curve*h/2), units.Length, "ξ over the strain w″ h/2 of the mode")
	}
	r.Need(scale.CurvatureLength, thickness.Path())
	r.Value(scale.CurvatureLength).Kind = units.Length
}

// addedNeeds says what the added masses wait for, and of which kind they are.
func (r *Resolver) addedNeeds(k units.Kind) {
	for _, id := range []scale.ID{scale.AddedMass, scale.AddedMassFree} {
		r.Need(id, r.Needs(scale.Density))
		r.Value(id).Kind = k
	}
}

// displace resolves the displaced mass of a structure of thickness h.
func (r *Resolver) displace(mass float64, k units.Kind, how string, h float64, thickness *input.Field) {
	r.derive(scale.DisplacedMass, mass, k, how)
	r.Value(scale.DisplacedMass).Kind = k
	need := thickness.Path()
	if !math.IsNaN(h) {
		need = r.Needs(scale.Density)
	}
	r.Need(scale.DisplacedMass, need)
}

// wavePressure puts the pressure of the oscillation under a bending wave,
// ρω²ξ/k in place of ρω²ξL; over is kL.
func wavePressure(g *group.Set, over float64) {
	switch g.State(group.OscillationPressure) {
	case group.Known:
		g.Put(group.OscillationPressure, g.Get(group.OscillationPressure)/over)
	case group.Missing:
		n := g.Need(group.OscillationPressure)
		n.Coefficient *= math.Pow(over, 1/n.Power)
		if !math.IsNaN(n.Coefficient) && !math.IsInf(n.Coefficient, 0) {
			g.Miss(group.OscillationPressure, n)
		}
	}
}

// waveLayer puts the displacement thickness of the boundary layer at the end of
// a length times the wave number along the flow: the length that shapes the
// flow is the wave's.
func waveLayer(g *group.Set, length, wave float64) {
	re := g.Get(group.LengthReynolds)
	if math.IsNaN(re) {
		g.Miss(group.BoundaryLayer, g.Need(group.LengthReynolds))
		return
	}
	g.Put(group.BoundaryLayer, displacementThickness(re)*length*wave)
}

// damping puts the damping ratios that the fluid adds, and the total.
func damping(s *scale.Set, g *group.Set) {
	share := func(target, inertia, factor group.ID) {
		if g.Has(group.AddedMassRatio) && g.Has(factor) && g.Has(inertia) {
			mu := g.Get(group.AddedMassRatio)
			g.Put(target, 0.5*mu*g.Get(factor)/(1+mu*g.Get(inertia)))
		}
	}
	share(group.DampingViscous, group.ViscousInertia, group.ViscousDamping)
	share(group.DampingRadiation, group.AcousticInertia, group.AcousticDamping)
	if !g.Has(group.DampingRatio) {
		return
	}
	total := g.Get(group.DampingRatio)
	for _, id := range []group.ID{group.DampingViscous, group.DampingRadiation, group.DampingFlow, group.DampingTwoPhase, group.DampingElectric} {
		if g.Has(id) {
			total += g.Get(id)
		}
	}
	g.Put(group.DampingTotal, total)
}

// ToleranceOf returns the tolerance that a case asks for.
func ToleranceOf(c *input.Case) finding.Tolerance {
	t := finding.Presets[0]
	if v := c.Lookup(TolerancePreset); v != nil {
		t, _ = finding.FindPreset(v.Text)
	}
	own := false
	for _, o := range []struct {
		f *input.Field
		x *float64
	}{{ToleranceFrequency, &t.Frequency}, {ToleranceLoad, &t.Load}, {ToleranceResponse, &t.Response}} {
		if c.Has(o.f) {
			*o.x, own = c.X(o.f), true
		}
	}
	if own {
		t.Name = "own"
	}
	return t
}

// InterestOf returns the measures that count in a case.
func InterestOf(c *input.Case) finding.Interest {
	v := c.Lookup(InterestField)
	if v == nil || len(v.List) == 0 {
		return finding.DefaultInterest
	}
	var i finding.Interest
	for _, name := range v.List {
		if m, ok := finding.FindMeasure(name); ok {
			i = i.With(m)
		}
	}
	return i
}

// StudyOf returns how a case wants to be judged.
func StudyOf(c *input.Case) finding.Study {
	return finding.Study{Tolerance: ToleranceOf(c), Interest: InterestOf(c), Picked: PickedCriteria(c)}
}
