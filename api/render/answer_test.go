package render

import (
	"math"
	"testing"

	"regimed/regime"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
	"regimed/units"
)

// usual is the study that a case has which says nothing about it.
var usual = finding.Study{Tolerance: finding.Presets[0], Interest: finding.DefaultInterest}

// solved stands for the solved problems of a kind: groups as they would be.
type solved map[group.ID]float64

func (s solved) Groups(_ *scale.Set, g *group.Set) {
	for id, x := range s {
		g.Put(id, x)
	}
	g.Factors = group.Factors{Inertia: 1.15, Viscous: 1.15, Acoustic: 1.5, Flow: 1.5, Buckling: 1.5, Flutter: 1.5, Stiffening: 0.4, StallPerRadian: 5}
	g.Band = group.Transition{Low: 190, High: 300, Length: group.Reynolds}
}

// caseOf returns a case that says no more than its title and reference.
func caseOf(t testing.TB, k, title string) *input.Case {
	t.Helper()
	return input.NewCase(kind.Schema(), k).
		With(input.Value{Field: kind.Title, Text: title}).
		With(input.Value{Field: kind.Reference, Text: "drawing 7"})
}

// panel is a steel panel, 1 m square and 10 mm thick, with water on one side:
// its added mass outweighs it, and its amplitude was not given.
func panel(t testing.TB) *regime.Answer {
	t.Helper()
	s := scale.New()
	put := func(id scale.ID, x float64, k units.Kind, o scale.Origin, note string) { s.Put(id, x, k, o, note) }
	put(scale.Length, 1, units.Length, scale.Given, "the side")
	put(scale.Span, 1, units.Length, scale.Given, "")
	put(scale.Thickness, 0.01, units.Length, scale.Given, "")
	put(scale.ViscousLength, 0.5, units.Length, scale.Derived, "half the side")
	put(scale.SolidDensity, 7850, units.Density, scale.LookedUp, "typical of structural steel")
	put(scale.Young, 210e9, units.Modulus, scale.LookedUp, "typical of structural steel")
	put(scale.DryMass, 78.5, units.MassPerArea, scale.Derived, "density times thickness")
	put(scale.DisplacedMass, 10, units.MassPerArea, scale.Derived, "ρh")
	put(scale.AddedMass, 407, units.MassPerArea, scale.Derived, "baffled plate")
	put(scale.AddedMassFree, 407, units.MassPerArea, scale.Derived, "baffled plate")
	put(scale.FrequencyDry, 49, units.Frequency, scale.Derived, "thin plate")
	put(scale.FrequencyWet, 49/math.Sqrt(1+407/78.5), units.Frequency, scale.Derived, "added mass")
	put(scale.FrequencyMotion, 49/math.Sqrt(1+407/78.5), units.Frequency, scale.Derived, "the wet natural frequency")
	put(scale.Density, 998.2, units.Density, scale.LookedUp, "water")
	put(scale.Viscosity, 1.0016e-3, units.DynamicViscosity, scale.LookedUp, "water")
	put(scale.KinematicViscosity, 1.0034e-6, units.KinematicViscosity, scale.Derived, "η/ρ")
	put(scale.SoundSpeed, 1482, units.Speed, scale.LookedUp, "water")
	put(scale.Temperature, 293.15, units.Temperature, scale.Assumed, "reference temperature of water")
	put(scale.Gravity, 9.80665, units.Acceleration, scale.Assumed, "standard gravity")
	put(scale.Pressure, 101325, units.Pressure, scale.Assumed, "the ambient pressure")
	put(scale.CoincidenceFrequency, 1.2e5/5.1, units.Frequency, scale.Derived, "c²/(2π)·√(m″/D)")
	s.Need(scale.Amplitude, "motion.amplitude")
	s.Value(scale.Amplitude).Kind = units.Length
	s.Need(scale.Damping, "structure.damping_ratio")
	r := &kind.Resolved{Kind: kind.Find("plate"), Scales: s,
		Traits:  group.Fluid | group.Still | group.Liquid | group.Flexible | group.Restrained | group.ViscousSolved | group.Uniform,
		Physics: amplitudeMissing{solved{group.ViscousInertia: 1.001, group.ViscousDamping: 0.0012, group.AcousticInertia: 1.0008, group.AcousticDamping: 0.03, group.DampingViscous: 0.0005}}}
	a := regime.Decide(r, usual)
	a.Case = caseOf(t, "plate", "Steel panel, \"wet\" on one side\n\x1b[31m")
	a.Warnings = []kind.Warning{{Pointer: "/structure/edges", Code: "assumed", Sentence: "The edges are taken as simply supported."}}
	return a
}

// amplitudeMissing makes the groups of the amplitude wait for it.
type amplitudeMissing struct{ solved }

func (p amplitudeMissing) Groups(s *scale.Set, g *group.Set) {
	p.solved.Groups(s, g)
	g.Miss(group.DisplacementThickness, group.Need{Input: "motion.amplitude", Unit: "m", Coefficient: 0.01, Power: 1})
}

// riser is a cylinder across a current, whose shedding meets its first mode.
func riser(t testing.TB) *regime.Answer {
	t.Helper()
	s := scale.New()
	put := func(id scale.ID, x float64, k units.Kind, o scale.Origin, note string) { s.Put(id, x, k, o, note) }
	put(scale.Length, 0.3, units.Length, scale.Given, "the diameter")
	put(scale.Span, 60, units.Length, scale.Given, "")
	put(scale.ViscousLength, 0.15, units.Length, scale.Derived, "the radius")
	put(scale.SemiChord, 0.15, units.Length, scale.Derived, "the radius")
	put(scale.DryMass, 145, units.MassPerLength, scale.Given, "")
	put(scale.DisplacedMass, 72.5, units.MassPerLength, scale.Derived, "ρπD²/4")
	put(scale.AddedMass, 72.5, units.MassPerLength, scale.Derived, "ρπD²/4")
	put(scale.AddedMassFree, 72.5, units.MassPerLength, scale.Derived, "ρπD²/4")
	put(scale.FrequencyDry, 0.8, units.Frequency, scale.Given, "")
	put(scale.FrequencyWet, 0.8/math.Sqrt(1.5), units.Frequency, scale.Derived, "added mass")
	put(scale.FrequencyMotion, 0.8/math.Sqrt(1.5), units.Frequency, scale.Derived, "the wet natural frequency")
	put(scale.Damping, 0.003, units.Damping, scale.Given, "")
	put(scale.Amplitude, 0.1, units.Length, scale.Given, "")
	put(scale.AmplitudeInterest, 0.1, units.Length, scale.Derived, "the amplitude")
	put(scale.Speed, 1, units.Speed, scale.Given, "")
	put(scale.SpeedLow, 0, units.Speed, scale.Assumed, "the flow starts from rest")
	put(scale.SpeedHigh, 1, units.Speed, scale.Assumed, "the speed of the flow")
	put(scale.Density, 1025, units.Density, scale.LookedUp, "seawater")
	put(scale.KinematicViscosity, 1.19e-6, units.KinematicViscosity, scale.Derived, "η/ρ")
	put(scale.SoundSpeed, 1500, units.Speed, scale.LookedUp, "seawater")
	put(scale.Gravity, 9.80665, units.Acceleration, scale.Assumed, "standard gravity")
	put(scale.Pressure, 5e5, units.Pressure, scale.Given, "")
	put(scale.VapourPressure, 2339, units.Pressure, scale.LookedUp, "seawater")
	p := solved{group.Strouhal: 0.2, group.SheddingRatio: 1.02, group.LockInPosition: 1.02, group.WakeBandLow: 0.67, group.WakeBandHigh: 1.97,
		group.VortexAmplitude: 0.9, group.DragCoefficient: 1.2, group.LiftFluctuation: 0.3, group.InlineVelocity: 4, group.InlinePosition: 1.125,
		group.InlineScruton: 12, group.Scruton: 0.15, group.DampingViscous: 0.0004, group.DampingTotal: 0.003, group.ViscousInertia: 1.001,
		group.AcousticInertia: 1, group.DampingRadiation: 1e-9, group.Slenderness: 0.005, group.StaticDeflection: 0.2, group.StaticDeflectionSpan: 0.001,
		group.StaticDeflectionInterest: 0.6, group.DisplacementThickness: 1, group.Slope: 0.01, group.SuctionPeak: 2, group.KeuleganCarpenter: 2.1}
	r := &kind.Resolved{Kind: kind.Find("cylinder"), Scales: s,
		Traits:  group.Fluid | group.Cross | group.Liquid | group.Bluff | group.Circular | group.Flexible | group.ViscousSolved | group.Uniform | group.Amplitude | group.ModesDerived,
		Physics: p}
	a := regime.Decide(r, usual)
	a.Case = caseOf(t, "cylinder", "Riser")
	return a
}

// dry is a structure without any fluid.
func dry(t testing.TB) *regime.Answer {
	t.Helper()
	s := scale.New()
	s.Put(scale.DryMass, 2, units.Mass, scale.Given, "")
	s.Put(scale.FrequencyDry, 10, units.Frequency, scale.Given, "")
	r := &kind.Resolved{Kind: kind.Find("generic"), Scales: s, Physics: solved{}}
	return regime.Decide(r, usual)
}

// answers are all of them, and the classified ones, by name.
func answers(t testing.TB) map[string]*regime.Answer {
	t.Helper()
	all := map[string]*regime.Answer{"panel": panel(t), "riser": riser(t), "dry": dry(t), "uncertain": spread(t), "beyond": beyond(t)}
	for name, doc := range classified {
		all["classified "+name] = classify(t, doc)
	}
	return all
}
