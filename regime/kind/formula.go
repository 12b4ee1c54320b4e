package kind

import (
	"math"

	"regimed/regime/group"
	"regimed/regime/scale"
)

// Formula makes one group from scales.
type Formula struct {
	Group group.ID
	From  []scale.ID // the scales that it uses, in the order of the definition
	Value func(s *scale.Set) float64
}

// Formulas are the groups that every kind makes alike. A kind may make further
// groups, or replace one of these by a sharper one.
var Formulas = []Formula{
	{group.MassRatio, []scale.ID{scale.DryMass, scale.DisplacedMass}, func(s *scale.Set) float64 {
		return s.X(scale.DryMass) / s.X(scale.DisplacedMass)
	}},
	{group.ReducedVelocity, []scale.ID{scale.Speed, scale.FrequencyDry, scale.Length}, func(s *scale.Set) float64 {
		return s.X(scale.Speed) / (s.X(scale.FrequencyDry) * s.X(scale.Length))
	}},
	{group.Reynolds, []scale.ID{scale.Speed, scale.Length, scale.KinematicViscosity}, func(s *scale.Set) float64 {
		return s.X(scale.Speed) * s.X(scale.Length) / s.X(scale.KinematicViscosity)
	}},
	{group.Stokes, []scale.ID{scale.FrequencyMotion, scale.ViscousLength, scale.KinematicViscosity}, func(s *scale.Set) float64 {
		v := s.X(scale.ViscousLength)
		return 2 * math.Pi * s.X(scale.FrequencyMotion) * v * v / s.X(scale.KinematicViscosity)
	}},
	{group.Compressibility, []scale.ID{scale.FrequencyMotion, scale.Length, scale.SoundSpeed}, func(s *scale.Set) float64 {
		return 2 * math.Pi * s.X(scale.FrequencyMotion) * s.X(scale.Length) / s.X(scale.SoundSpeed)
	}},
	{group.Froude, []scale.ID{scale.Speed, scale.Gravity, scale.Depth}, func(s *scale.Set) float64 {
		return s.X(scale.Speed) / math.Sqrt(s.X(scale.Gravity)*s.X(scale.Depth))
	}},
	{group.AddedMassRatio, []scale.ID{scale.AddedMass, scale.DryMass}, func(s *scale.Set) float64 {
		return s.X(scale.AddedMass) / s.X(scale.DryMass)
	}},
	{group.AddedMassRatioFree, []scale.ID{scale.AddedMassFree, scale.DryMass}, func(s *scale.Set) float64 {
		return s.X(scale.AddedMassFree) / s.X(scale.DryMass)
	}},
	{group.MassNumber, []scale.ID{scale.Density, scale.SolidDensity}, func(s *scale.Set) float64 {
		return s.X(scale.Density) / s.X(scale.SolidDensity)
	}},
	{group.ReducedVelocityWet, []scale.ID{scale.Speed, scale.FrequencyWet, scale.Length}, func(s *scale.Set) float64 {
		return s.X(scale.Speed) / (s.X(scale.FrequencyWet) * s.X(scale.Length))
	}},
	{group.ReducedFrequency, []scale.ID{scale.FrequencyWet, scale.SemiChord, scale.Speed}, func(s *scale.Set) float64 {
		return 2 * math.Pi * s.X(scale.FrequencyWet) * s.X(scale.SemiChord) / s.X(scale.Speed)
	}},
	{group.ViscousDepthRatio, []scale.ID{scale.KinematicViscosity, scale.FrequencyMotion, scale.ViscousLength}, func(s *scale.Set) float64 {
		return stokesLayer(s, scale.FrequencyMotion) / s.X(scale.ViscousLength)
	}},
	{group.Mach, []scale.ID{scale.Speed, scale.SoundSpeed}, func(s *scale.Set) float64 {
		return s.X(scale.Speed) / s.X(scale.SoundSpeed)
	}},
	{group.CoincidenceRatio, []scale.ID{scale.FrequencyMotion, scale.CoincidenceFrequency}, func(s *scale.Set) float64 {
		return s.X(scale.FrequencyMotion) / s.X(scale.CoincidenceFrequency)
	}},
	{group.DynamicFroude, []scale.ID{scale.FrequencyMotion, scale.Depth, scale.Gravity}, func(s *scale.Set) float64 {
		return 2 * math.Pi * s.X(scale.FrequencyMotion) * math.Sqrt(s.X(scale.Depth)/s.X(scale.Gravity))
	}},
	{group.FrequencyRatio, []scale.ID{scale.FrequencyWet, scale.FrequencyDry}, func(s *scale.Set) float64 {
		return s.X(scale.FrequencyWet) / s.X(scale.FrequencyDry)
	}},
	{group.DampingRatio, []scale.ID{scale.Damping, scale.FrequencyWet, scale.FrequencyDry}, func(s *scale.Set) float64 {
		return s.X(scale.Damping) * s.X(scale.FrequencyWet) / s.X(scale.FrequencyDry)
	}},
	{group.Displacement, []scale.ID{scale.Amplitude, scale.Length}, func(s *scale.Set) float64 {
		return s.X(scale.Amplitude) / s.X(scale.Length)
	}},
	{group.DisplacementSpan, []scale.ID{scale.Amplitude, scale.Span}, func(s *scale.Set) float64 {
		return s.X(scale.Amplitude) / s.X(scale.Span)
	}},
	{group.DisplacementGap, []scale.ID{scale.Amplitude, scale.Gap}, func(s *scale.Set) float64 {
		return s.X(scale.Amplitude) / s.X(scale.Gap)
	}},
	{group.DisplacementDepth, []scale.ID{scale.Amplitude, scale.Depth}, func(s *scale.Set) float64 {
		return s.X(scale.Amplitude) / s.X(scale.Depth)
	}},
	{group.StrainRatio, []scale.ID{scale.Amplitude, scale.CurvatureLength, scale.LinearStrain}, func(s *scale.Set) float64 {
		return s.X(scale.Amplitude) / (s.X(scale.CurvatureLength) * s.X(scale.LinearStrain))
	}},
	{group.MotionSpeedRatio, []scale.ID{scale.FrequencyMotion, scale.Amplitude, scale.Speed}, func(s *scale.Set) float64 {
		return 2 * math.Pi * s.X(scale.FrequencyMotion) * s.X(scale.Amplitude) / s.X(scale.Speed)
	}},
	{group.StaticDeflection, []scale.ID{scale.StaticDeflection, scale.Length}, func(s *scale.Set) float64 {
		return s.X(scale.StaticDeflection) / s.X(scale.Length)
	}},
	{group.StaticDeflectionInterest, []scale.ID{scale.StaticDeflection, scale.AmplitudeInterest}, func(s *scale.Set) float64 {
		return s.X(scale.StaticDeflection) / s.X(scale.AmplitudeInterest)
	}},
	{group.StaticDeflectionSpan, []scale.ID{scale.StaticDeflection, scale.Span}, func(s *scale.Set) float64 {
		return s.X(scale.StaticDeflection) / s.X(scale.Span)
	}},
	{group.StaticDeflectionGap, []scale.ID{scale.StaticDeflection, scale.Gap}, func(s *scale.Set) float64 {
		return s.X(scale.StaticDeflection) / s.X(scale.Gap)
	}},
	{group.Cauchy, []scale.ID{scale.Density, scale.Speed, scale.Young}, func(s *scale.Set) float64 {
		return s.X(scale.Density) * s.X(scale.Speed) * s.X(scale.Speed) / s.X(scale.Young)
	}},
	{group.Elastogravity, []scale.ID{scale.Density, scale.Gravity, scale.Length, scale.Young}, func(s *scale.Set) float64 {
		return s.X(scale.Density) * s.X(scale.Gravity) * s.X(scale.Length) / s.X(scale.Young)
	}},
	{group.GapRatio, []scale.ID{scale.Gap, scale.Length}, func(s *scale.Set) float64 {
		return s.X(scale.Gap) / s.X(scale.Length)
	}},
	{group.Bond, []scale.ID{scale.Density, scale.Gravity, scale.Length, scale.SurfaceTension}, func(s *scale.Set) float64 {
		l := s.X(scale.Length)
		return s.X(scale.Density) * s.X(scale.Gravity) * l * l / s.X(scale.SurfaceTension)
	}},
	{group.Weber, []scale.ID{scale.Density, scale.Speed, scale.Length, scale.SurfaceTension}, func(s *scale.Set) float64 {
		u := s.X(scale.Speed)
		return s.X(scale.Density) * u * u * s.X(scale.Length) / s.X(scale.SurfaceTension)
	}},
	{group.Cavitation, []scale.ID{scale.Pressure, scale.VapourPressure, scale.Density, scale.SpeedHigh}, func(s *scale.Set) float64 {
		u := s.X(scale.SpeedHigh)
		return (s.X(scale.Pressure) - s.X(scale.VapourPressure)) / (s.X(scale.Density) * u * u / 2)
	}},
	{group.OscillationPressure, []scale.ID{scale.Density, scale.FrequencyMotion, scale.Amplitude, scale.Length, scale.Pressure, scale.VapourPressure}, func(s *scale.Set) float64 {
		omega := 2 * math.Pi * s.X(scale.FrequencyMotion)
		return s.X(scale.Density) * omega * omega * s.X(scale.Amplitude) * s.X(scale.Length) / math.Max(s.X(scale.Pressure)-s.X(scale.VapourPressure), 1e-12*s.X(scale.Pressure))
	}},
	{group.Knudsen, []scale.ID{scale.HeatCapacityRatio, scale.KinematicViscosity, scale.SoundSpeed, scale.Gap}, func(s *scale.Set) float64 {
		return meanFreePath(s) / s.X(scale.Gap)
	}},
	{group.FilmReynolds, []scale.ID{scale.FrequencyMotion, scale.Gap, scale.KinematicViscosity}, func(s *scale.Set) float64 {
		gap := s.X(scale.Gap)
		return 2 * math.Pi * s.X(scale.FrequencyMotion) * gap * gap / s.X(scale.KinematicViscosity)
	}},
	{group.ThermalLayer, []scale.ID{scale.HeatCapacityRatio, scale.Prandtl, scale.KinematicViscosity, scale.FrequencyMotion, scale.Gap}, func(s *scale.Set) float64 {
		return (s.X(scale.HeatCapacityRatio) - 1) * stokesLayer(s, scale.FrequencyMotion) / math.Sqrt(s.X(scale.Prandtl)) / s.X(scale.Gap)
	}},
	{group.TurbulenceIntensity, []scale.ID{scale.Turbulence}, func(s *scale.Set) float64 { return s.X(scale.Turbulence) }},
	{group.StallRatio, []scale.ID{scale.Incidence, scale.StallAngle}, func(s *scale.Set) float64 {
		return math.Abs(s.X(scale.Incidence)) / s.X(scale.StallAngle)
	}},
	{group.LengthReynolds, []scale.ID{scale.Speed, scale.Span, scale.KinematicViscosity}, func(s *scale.Set) float64 {
		return s.X(scale.Speed) * s.X(scale.Span) / s.X(scale.KinematicViscosity)
	}},
	{group.OperatingLow, []scale.ID{scale.SpeedLow, scale.Speed}, func(s *scale.Set) float64 {
		return s.X(scale.SpeedLow) / s.X(scale.Speed)
	}},
	{group.OperatingHigh, []scale.ID{scale.SpeedHigh, scale.Speed}, func(s *scale.Set) float64 {
		return s.X(scale.SpeedHigh) / s.X(scale.Speed)
	}},
	{group.NextMode, []scale.ID{scale.NextFrequency, scale.FrequencyDry}, func(s *scale.Set) float64 {
		return s.X(scale.NextFrequency) / s.X(scale.FrequencyDry)
	}},
}

// stokesLayer is the depth of the oscillating boundary layer, √(2ν/ω).
func stokesLayer(s *scale.Set, f scale.ID) float64 {
	return math.Sqrt(s.X(scale.KinematicViscosity) / (math.Pi * s.X(f)))
}

// meanFreePath is √(πγ/2) ν/c.
func meanFreePath(s *scale.Set) float64 {
	return math.Sqrt(math.Pi*s.X(scale.HeatCapacityRatio)/2) * s.X(scale.KinematicViscosity) / s.X(scale.SoundSpeed)
}

// FormulaOf returns the formula of a group, or nil.
func FormulaOf(id group.ID) *Formula {
	for i := range Formulas {
		if Formulas[i].Group == id {
			return &Formulas[i]
		}
	}
	return nil
}

// formulas makes the common groups. Where scales are absent that would be
// needed, the group waits for the first input that is missing; where they do
// not arise, neither does the group.
func formulas(s *scale.Set, g *group.Set) {
	var trial *scale.Set // scales in which a missing one is tried
	for i := range Formulas {
		f := &Formulas[i]
		if x := f.Value(s); !math.IsNaN(x) {
			g.Put(f.Group, x)
			continue
		}
		missing, need := missingScale(s, f.From)
		if need == "" {
			continue
		}
		if trial == nil {
			trial = s.With(missing, math.NaN())
		}
		g.Miss(f.Group, inputNeed(trial, f, missing, need))
	}
	if trial != nil {
		trial.Release()
	}
}

// drop takes away the common groups that do not arise by the traits of a case.
func drop(g *group.Set) {
	if !g.Is(group.NearSurface) {
		g.Drop(group.Bond)
		g.Drop(group.Weber)
		g.Drop(group.Froude)
		g.Drop(group.DynamicFroude)
		g.Drop(group.DisplacementDepth)
	}
	if g.Is(group.Gas) {
		g.Drop(group.OscillationPressure)
		g.Drop(group.Cavitation)
	}
	if !g.Is(group.Gas) {
		g.Drop(group.ThermalLayer)
	}
}

// missingScale returns the first absent scale of a list and the input that
// would settle it. A scale that does not arise makes the whole list moot.
func missingScale(s *scale.Set, from []scale.ID) (scale.ID, string) {
	missing, need := scale.ID(0), ""
	for _, id := range from {
		if s.Has(id) {
			continue
		}
		n := s.Needs(id)
		if n == "" {
			return 0, ""
		}
		if need == "" {
			missing, need = id, n
		}
	}
	return missing, need
}

// inputNeed finds how the group follows from the missing scale: as a power,
// where the input is the scale itself and everything else is known.
func inputNeed(trial *scale.Set, f *Formula, missing scale.ID, need string) group.Need {
	v := trial.Value(missing)
	n := group.Need{Input: need, Unit: v.Kind.SI()}
	if scale.Of(missing).Input != need {
		return n
	}
	at := func(x float64) float64 { v.X = x; return f.Value(trial) }
	one, two, eight := at(1), at(2), at(8)
	v.X = math.NaN()
	power := math.Log2(two / one)
	c := math.Pow(one, -1/power)
	// a pressure less the vapour pressure is no power of the latter, however
	// little the two values differ
	if math.IsNaN(c) || math.IsInf(c, 0) || c == 0 || !(math.Abs(math.Log2(eight/one)-3*power) <= 1e-9*math.Abs(power)) {
		return n
	}
	n.Power = power
	n.Coefficient = c
	return n
}
