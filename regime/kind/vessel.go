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

// The fields of a vessel.
var (
	vesselRadius   = quantity("radius", units.Length, "gt=0", "inner radius at the mean pressure", "")
	vesselWall     = quantity("wall_thickness", units.Length, "gt=0", "wall thickness", "")
	vesselLength   = quantity("length", units.Length, "gt=0", "length of the segment", "")
	vesselPulse    = quantity("pulse_frequency", units.Frequency, "gt=0", "frequency of the pulse: of a heart or a pump", "motion.frequency")
	vesselPeak     = quantity("peak_speed", units.Speed, "gte=0", "highest speed of the flow in a pulse", "the upper end of flow.operating")
	vesselPressure = quantity("pulse_pressure", units.PressureDifference, "gte=0", "highest less lowest pressure of a pulse", "ρc(U_peak − U), the wave without reflections")
	vesselExternal = quantity("external_pressure", units.Pressure, "gt=0", "absolute pressure around the vessel", "none that could press it flat")
)

// Vessel is a compliant tube with pulsating flow.
var Vessel = &Kind{
	Name:       "vessel",
	Title:      "Compliant vessel",
	Doc:        "artery, vein, graft or soft tube through which a pulse runs; flow.speed is the mean speed",
	Fields:     elastic(vesselRadius, vesselWall, vesselLength, vesselPulse, vesselPeak, vesselPressure, vesselExternal),
	Directions: []string{"internal"},
	New:        newVessel,
}

// vessel holds the solved problems of one vessel.
type vessel struct {
	r, h         float64
	fluidPerArea float64 // added mass per wall area of the longest wave
	perimeter    float64
	collapse     float64 // pressure under which it buckles into lobes
	lobes        int
	pressure     bool // the pressure inside is given
}

func newVessel(r *Resolver) Physics {
	v := &vessel{h: math.NaN(), collapse: math.NaN()}
	radius := r.c.Lookup(vesselRadius)
	if radius == nil {
		r.violations.Add(vesselRadius.Pointer(), input.MissingField, "A vessel needs its inner radius.", nil)
		return v
	}
	if !r.Is(group.Fluid) {
		r.violations.Add("/fluid", input.MissingField, "The pulse of a vessel is in its fluid: give one.", nil)
		return v
	}
	v.r = radius.Q.Value
	r.Traits = r.Traits&^group.Still | group.Internal | group.Pulsatile | group.Flexible | group.Uniform
	r.derive(scale.Length, 2*v.r, units.Length, "the inner diameter, twice the radius")
	r.Put(scale.ViscousLength, v.r, units.Length, scale.Given, "the inner radius")
	r.takeOrNeed(scale.Span, vesselLength)
	r.takeOrNeed(scale.Thickness, vesselWall)
	v.h = r.X(scale.Thickness)
	r.takeOrNeed(scale.Speed, FlowSpeed)
	r.closeGroups()
	r.material()
	v.frequency(r)
	v.masses(r)
	v.wave(r)
	v.pulses(r)
	v.external(r)
	v.unused(r)
	return v
}

func (v *vessel) frequency(r *Resolver) {
	given := r.take(scale.FrequencyMotion, vesselPulse)
	switch {
	case !given:
		r.takeOrNeed(scale.FrequencyMotion, MotionFrequency)
		r.Value(scale.FrequencyMotion).Needs = needUnless(r.Has(scale.FrequencyMotion), vesselPulse.Path())
		r.closeGroups()
	case r.c.Has(MotionFrequency) && math.Abs(r.c.X(MotionFrequency)/r.X(scale.FrequencyMotion)-1) > 1e-3:
		r.contradict(MotionFrequency, "The frequency of the motion is that of the pulse; give one of the two.")
	}
}

func needUnless(known bool, input string) string {
	if known {
		return ""
	}
	return input
}

// masses resolves wall and fluid per length, and the added mass of the longest
// wave of the wall, which lags of all most behind.
func (v *vessel) masses(r *Resolver) {
	rho, l := r.X(scale.Density), r.X(scale.Span)
	v.perimeter = 2 * math.Pi * v.r
	r.derive(scale.DisplacedMass, rho*math.Pi*v.r*v.r, units.MassPerLength, "ρπR² of the bore")
	r.derive(scale.DryMass, r.X(scale.SolidDensity)*math.Pi*v.h*(2*v.r+v.h), units.MassPerLength, "ρ_s times the section")
	v.fluidPerArea = rho * v.r * tubeAddedMass(math.Pi*v.r/l)
	r.derive(scale.AddedMass, v.fluidPerArea*v.perimeter, units.MassPerLength, "ρ I₀(kR)/(k I₁(kR)) of the wave k = π/ℓ, times the perimeter")
	r.derive(scale.AddedMassFree, r.X(scale.AddedMass), units.MassPerLength, "no walls")
	r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	r.Need(scale.DryMass, neededBy(r.Set, scale.SolidDensity, scale.Thickness))
	for _, id := range []scale.ID{scale.AddedMass, scale.AddedMassFree} {
		r.Need(id, neededBy(r.Set, scale.Density, scale.Span))
	}
	for _, id := range []scale.ID{scale.DisplacedMass, scale.DryMass, scale.AddedMass, scale.AddedMassFree} {
		r.Value(id).Kind = units.MassPerLength
	}
}

// tubeAddedMass is the added mass per wall area of the fluid in a round tube
// whose wall moves as cos kx, over ρR.
//
//	m_a/(ρR) = I₀(kR)/(kR I₁(kR))
//
// Symbols: x = kR [1], wave number times radius; of a segment ℓ between
// closed or held ends π R/ℓ. Range: x > 0. Accuracy: exact for a potential flow.
// Check: x 0.314159: 20.5132 (a plane channel of half the width R has
// coth-like 1/(x tanh x) = 10.463, near half of it).
// Source: the potential I₀(kr) cos kx; Causin, Gerbeau & Nobile 2005 solve the
// plane channel.
func tubeAddedMass(x float64) float64 {
	ratio := 0.0 // I₁/I₀ = x/(2 + x²/(4 + x²/(6 + …)))
	for n := 40 + 2*int(math.Min(x, 200)); n >= 2; n-- {
		ratio = x * x / (2*float64(n) + ratio)
	}
	ratio = x / (2 + ratio)
	return 1 / (x * ratio)
}

// wave resolves the speed of the pulse wave without viscosity.
func (v *vessel) wave(r *Resolver) {
	c, how := pulseWaveSpeed(r.X(scale.Young), v.h, r.X(scale.Density), v.r), "√(Eh/(2ρR)), Moens and Korteweg"
	if sound := r.X(scale.SoundSpeed); !math.IsNaN(sound) {
		c /= math.Sqrt(1 + c*c/(sound*sound))
		how += ", with the compression of the fluid"
	}
	r.derive(scale.WaveSpeed, c, units.Speed, how)
	r.Need(scale.WaveSpeed, neededBy(r.Set, scale.Young, scale.Thickness, scale.Density))
	r.Value(scale.WaveSpeed).Kind = units.Speed
	if ratio := v.h / v.r; ratio > 0.5 {
		r.warn(vesselWall, "thick-wall", fmt.Sprintf("The wall is %.2g of the radius: the thin-walled tube is %.0f %% off in the wave speed.", ratio, 25*ratio))
	}
}

// pulseWaveSpeed is the speed of a pulse in a thin soft tube.
//
//	c = √(Eh/(2ρR))
//
// Symbols: E [Pa], h [m], ρ [kg/m³], R [m]. Range: h well below R; fluid stiff
// against the wall. Accuracy: h/4R by the thickness. Check: that of
// canon.MoensKorteweg. Source: Moens 1878; Korteweg 1878.
func pulseWaveSpeed(young, wall, density, radius float64) float64 {
	return math.Sqrt(young * wall / (2 * density * radius))
}

// pulses resolves peak speed, pulse pressure and the stroke of the wall.
func (v *vessel) pulses(r *Resolver) {
	if !r.take(scale.SpeedPeak, vesselPeak) {
		if r.c.Has(FlowOperating) {
			r.Put(scale.SpeedPeak, r.X(scale.SpeedHigh), units.Speed, scale.Derived, "the highest speed of operation")
		}
		r.Need(scale.SpeedPeak, vesselPeak.Path())
		r.Value(scale.SpeedPeak).Kind = units.Speed
	}
	if peak := r.X(scale.SpeedPeak); peak < r.X(scale.Speed)*(1-1e-9) {
		r.contradict(vesselPeak, "The peak speed lies below the mean speed.")
	}
	v.pulsePressure(r)
	if !r.Has(scale.Amplitude) {
		strain := r.X(scale.PulsePressure) * v.r / (r.X(scale.Young) * v.h)
		r.derive(scale.Amplitude, strain*v.r, units.Length, "Δp R²/(Eh), the widening of the radius")
		r.Value(scale.Amplitude).Needs = neededBy(r.Set, scale.PulsePressure, scale.Young, scale.Thickness)
	}
}

func (v *vessel) pulsePressure(r *Resolver) {
	if r.take(scale.PulsePressure, vesselPressure) {
		return
	}
	r.Value(scale.PulsePressure).Kind = units.PressureDifference
	if r.Has(scale.Amplitude) {
		r.derive(scale.PulsePressure, r.X(scale.Amplitude)*r.X(scale.Young)*v.h/(v.r*v.r), units.PressureDifference, "ξ Eh/R² of the amplitude given")
		r.Need(scale.PulsePressure, neededBy(r.Set, scale.Young, scale.Thickness))
		return
	}
	if r.Has(scale.SpeedPeak) {
		wave := r.X(scale.Density) * r.X(scale.WaveSpeed) * (r.X(scale.SpeedPeak) - r.X(scale.Speed))
		r.derive(scale.PulsePressure, wave, units.PressureDifference, "ρc(U_peak − U), a wave without reflections")
		r.Need(scale.PulsePressure, neededBy(r.Set, scale.Density, scale.Speed, scale.WaveSpeed))
		return
	}
	r.Need(scale.PulsePressure, vesselPressure.Path())
}

// external resolves the pressure around, and that under which the tube buckles.
func (v *vessel) external(r *Resolver) {
	v.pressure = r.c.Has(FluidPressure)
	p, ok := r.pressureOf(vesselExternal)
	if !ok {
		return
	}
	r.Put(scale.ExternalPressure, p, units.Pressure, scale.Given, "")
	v.collapse, v.lobes = lobePressure(r.X(scale.Young), r.X(scale.Poisson), v.h, v.r, r.X(scale.Span))
}

// mostLobes is the largest number of lobes that is tried.
const mostLobes = 60

// lobePressure is the external pressure under which a tube between round ends
// buckles into lobes, and the number of lobes.
//
//	p = (Eh/R)·min over n ≥ 2 of { 1/((n² − 1)(1 + (nℓ/πR)²)²)
//	    + h²/(12R²(1 − ν²))·[n² − 1 + (2n² − 1 − ν)/(1 + (nℓ/πR)²)] }
//
// Symbols: E [Pa], ν [1] of the wall; h wall [m], R radius [m], ℓ length [m]
// (NaN or long: the long tube, Eh³/(4(1 − ν²)R³)).
// Range: thin wall. Accuracy: that of the thin shell; the imperfect wall buckles
// earlier. Check: ℓ → ∞, E 1, ν 0, h/R 0.1: 2.5e-4.
// Source: von Mises 1914 in Timoshenko & Gere 1961, section 11.5 (from memory).
func lobePressure(young, nu, wall, radius, length float64) (pressure float64, lobes int) {
	best, at := math.Inf(1), 2
	thin := wall * wall / (12 * radius * radius * (1 - nu*nu))
	for n := 2; n <= mostLobes; n++ {
		n2 := float64(n * n)
		long := math.Inf(1)
		if !math.IsNaN(length) {
			long = 1 + n2*length*length/(math.Pi*math.Pi*radius*radius)
		}
		if p := 1/((n2-1)*long*long) + thin*(n2-1+(2*n2-1-nu)/long); p < best {
			best, at = p, n
		}
	}
	return young * wall / radius * best, at
}

func (v *vessel) unused(r *Resolver) {
	for _, f := range []*input.Field{WallGap, ShellDiameter, DepthBelowSurface, BackingDepth} {
		if r.c.Has(f) {
			r.warn(f, "not-used", "What lies around a vessel enters by external_pressure alone.")
		}
	}
}

// Groups puts the groups that are the vessel's own.
func (v *vessel) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.15, Viscous: 1.15, Acoustic: 1.15, Flow: 1.5, Buckling: 1.5, Flutter: 2, StallPerRadian: 1}
	g.Band = group.Transition{Low: 2300, High: 4000, Length: group.Reynolds}
	if !g.Is(group.Pulsatile) {
		return
	}
	v.profile(s, g)
	v.waves(s, g)
	v.strain(s, g)
	v.flow(s, g)
	v.squeeze(s, g)
	if ratio := s.X(scale.SolidDensity) * v.h / (s.X(scale.Density) * v.r); !math.IsNaN(ratio) {
		g.Put(group.WallMassRatio, ratio)
	}
	rarefaction(s, g, 2*v.r)
}

// profile puts the Womersley number and what viscosity does to the pulse.
func (v *vessel) profile(s *scale.Set, g *group.Set) {
	alpha := v.r * math.Sqrt(2*math.Pi*s.X(scale.FrequencyMotion)/s.X(scale.KinematicViscosity))
	putOrWait(s, g, group.Womersley, alpha, scale.FrequencyMotion, scale.KinematicViscosity)
	if math.IsNaN(alpha) {
		waitFor(s, g, []scale.ID{scale.FrequencyMotion, scale.KinematicViscosity}, group.PulseSpeed, group.PulseDecay)
		return
	}
	re, im, err := canon.PulsatileTube(math.Min(alpha, 1e8))
	if err != nil {
		return
	}
	if speed, decay, err := canon.PulseWave(re, im); err == nil {
		g.Put(group.PulseSpeed, speed)
		g.Put(group.PulseDecay, decay)
	}
	if g.State(group.PulseSpeed) == group.Absent { // a wave so slow that none is left
		g.Put(group.PulseSpeed, 0)
		g.Put(group.PulseDecay, 0)
	}
}

// viscousWave is the speed of the pulse wave with viscosity.
func (v *vessel) viscousWave(s *scale.Set, g *group.Set) float64 {
	c := s.X(scale.WaveSpeed)
	if g.Has(group.PulseSpeed) {
		c *= math.Max(g.Get(group.PulseSpeed), 1e-6)
	}
	return c
}

// waves puts the lengths of the pulse.
func (v *vessel) waves(s *scale.Set, g *group.Set) {
	c, f := v.viscousWave(s, g), s.X(scale.FrequencyMotion)
	needs := []scale.ID{scale.Young, scale.Thickness, scale.Density, scale.FrequencyMotion}
	putOrWait(s, g, group.PulseLength, v.r*f/c, needs...)
	putOrWait(s, g, group.PulseTransit, f*s.X(scale.Span)/c, append(needs, scale.Span)...)
	sound := s.X(scale.SoundSpeed)
	putOrWait(s, g, group.WallCompliance, s.X(scale.Density)*sound*sound*2*v.r/(s.X(scale.Young)*v.h), scale.SoundSpeed, scale.Density, scale.Young, scale.Thickness)
	putOrWait(s, g, group.WaveSpeedRatio, s.X(scale.WaveSpeed)/s.X(scale.SoundSpeed), scale.SoundSpeed, scale.Young, scale.Thickness, scale.Density)
	if s.Has(scale.SpeedPeak) || s.Has(scale.SpeedHigh) {
		putOrWait(s, g, group.SpeedIndex, v.peak(s)/c, scale.Young, scale.Thickness, scale.Density)
	}
}

// peak is the highest speed of the flow that is known.
func (v *vessel) peak(s *scale.Set) float64 {
	if s.Has(scale.SpeedPeak) {
		return s.X(scale.SpeedPeak)
	}
	return s.X(scale.SpeedHigh)
}

// strain puts the strain of the wall.
func (v *vessel) strain(s *scale.Set, g *group.Set) {
	strain := s.X(scale.PulsePressure) * v.r / (s.X(scale.Young) * v.h)
	needs := []scale.ID{scale.PulsePressure, scale.Young, scale.Thickness}
	putOrWait(s, g, group.WallStrain, strain, needs...)
	putOrWait(s, g, group.StrainRatio, strain/s.X(scale.LinearStrain), append(needs, scale.LinearStrain)...)
}

// flow puts what the mean and the peak flow make.
func (v *vessel) flow(s *scale.Set, g *group.Set) {
	putOrWait(s, g, group.ReynoldsPeak, s.X(scale.SpeedPeak)*2*v.r/s.X(scale.KinematicViscosity), scale.SpeedPeak, scale.KinematicViscosity)
	putOrWait(s, g, group.FrictionLoss, math.Min(frictionFactor(g.Get(group.Reynolds), 0)*s.X(scale.Span)/(2*v.r), mostFriction), scale.Speed, scale.KinematicViscosity, scale.Span)
	if !s.Has(scale.Turbulence) {
		g.Drop(group.TurbulenceIntensity)
	}
}

// squeeze puts the external pressure above the lowest one inside, half a pulse
// below the mean, over that of collapse.
func (v *vessel) squeeze(s *scale.Set, g *group.Set) {
	if !s.Has(scale.ExternalPressure) {
		return
	}
	if !v.pressure {
		g.Miss(group.CollapsePressure, group.Need{Input: FluidPressure.Path(), Unit: "Pa"})
		return
	}
	lowest := s.X(scale.Pressure)
	if s.Has(scale.PulsePressure) {
		lowest -= s.X(scale.PulsePressure) / 2
	}
	putOrWait(s, g, group.CollapsePressure, math.Min(math.Max(s.X(scale.ExternalPressure)-lowest, 0)/v.collapse, unstableAnyhow), scale.Young, scale.Thickness)
}
