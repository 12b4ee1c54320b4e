package similar

import (
	"math"
	"math/big"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/scale"
	"regimed/units"
)

// nature is what the frequencies of a case depend on.
type nature struct {
	forced   bool // the motion has a frequency of its own; else it is the wet natural one
	restored bool // gravity restores a floating body, not the stiffness of a structure
	gravity  bool // what moves the fluid is gravity: waves, sloshing
	sloshing bool // the motion is that of the first sloshing mode, at no frequency of its own
}

// natureOf reads the nature off an answer.
func natureOf(a *regime.Answer) nature {
	n := nature{restored: a.Kind == kind.Floater, gravity: a.Groups.Any(group.Waves | group.Sloshing | group.Piercing)}
	if fixed := a.Case.Schema.Kind(a.Kind.Name).Find("fixed"); fixed != nil && a.Case.Flag(fixed, false) {
		n.restored = false
	}
	motion, wet := a.Scales.X(scale.FrequencyMotion), a.Scales.X(scale.FrequencyWet)
	switch {
	case a.Case.Has(kind.MotionFrequency):
		n.forced = true
	case !math.IsNaN(motion):
		n.forced = motion != wet
	default:
		n.forced = a.Groups.Is(group.Waves)
	}
	n.sloshing = a.Groups.Is(group.Sloshing) && !a.Case.Has(kind.MotionFrequency)
	return n
}

// natural are the powers of a natural frequency of the structure.
//
//	f ∝ √(E/ρ_s)/L; of a floating body √(ρ g/(ρ_s L))
//
// Symbols: E modulus, ρ_s density of the structure, L length, ρ density of the
// fluid, g gravity. Range: geometrically similar, linear structures, with shares of
// bending, tension and springs that are kept; bodies restored by their waterplane.
// Accuracy: exact. Check: the same material at 1:40: 40 times the frequency.
// Source: by dimensional analysis.
func (n nature) natural() Powers {
	if n.restored {
		return restoredFrequency
	}
	return elasticFrequency
}

var (
	elasticFrequency  = product(root(YoungModulus, 1), root(SolidDensity, -1), to(Length, -1))
	restoredFrequency = product(root(FluidDensity, 1), root(Gravity, 1), root(SolidDensity, -1), root(Length, -1))
)

// motion are the powers of the frequency of the motion.
func (n nature) motion() Powers {
	switch {
	case n.sloshing:
		return product(root(Gravity, 1), root(Length, -1))
	case n.forced:
		return product(to(Time, -1))
	}
	return n.natural()
}

// role is how a scale of a case follows from the factors; false where it does
// not follow from them alone. Masses are by volume: groups hold ratios of them.
func (n nature) role(id scale.ID) (Powers, bool) {
	switch id {
	case scale.Length, scale.ViscousLength, scale.Span, scale.SemiChord, scale.Depth, scale.Gap, scale.Amplitude:
		return product(to(Length, 1)), true
	case scale.Speed, scale.SpeedLow, scale.SpeedHigh:
		return product(to(Speed, 1)), true
	case scale.Density:
		return product(to(FluidDensity, 1)), true
	case scale.DisplacedMass, scale.AddedMass, scale.AddedMassFree:
		return product(to(FluidDensity, 1), to(Length, 3)), true
	case scale.SolidDensity:
		return product(to(SolidDensity, 1)), true
	case scale.DryMass:
		return product(to(SolidDensity, 1), to(Length, 3)), true
	case scale.FrequencyDry, scale.FrequencyWet:
		return n.natural(), true
	case scale.FrequencyMotion:
		return n.motion(), true
	case scale.KinematicViscosity:
		return product(to(KinematicViscosity, 1)), true
	case scale.SoundSpeed:
		return product(to(SoundSpeed, 1)), true
	case scale.SurfaceTension:
		return product(to(SurfaceTension, 1)), true
	case scale.Pressure, scale.VapourPressure:
		return product(to(StaticPressure, 1)), true
	case scale.Gravity:
		return product(to(Gravity, 1)), true
	case scale.Young:
		return product(to(YoungModulus, 1)), true
	case scale.HeatCapacityRatio:
		return product(to(HeatCapacityRatio, 1)), true
	case scale.CoincidenceFrequency: // c²√(m″/B)/2π
		return product(to(SoundSpeed, 2), root(SolidDensity, 1), root(YoungModulus, -1), to(Length, -1)), true
	}
	return Powers{}, false
}

// results are groups of the common formulas that follow from other groups, or are
// ratios of two speeds of one case: there is nothing to keep in them.
var results = map[group.ID]bool{group.FrequencyRatio: true, group.OperatingLow: true, group.OperatingHigh: true}

// ofFormula finds the powers of a group from its formula, by trying factors on
// it: false where it is no product of powers.
func (n nature) ofFormula(f *kind.Formula) (Powers, bool) {
	roles := make([]Powers, len(f.From))
	for i, id := range f.From {
		p, known := n.role(id)
		if !known {
			return Powers{}, false
		}
		roles[i] = p
	}
	var powers Powers
	for x := range FactorCount {
		e, regular := exponent(f, roles, x)
		if !regular {
			return Powers{}, false
		}
		if e.Sign() != 0 {
			powers[x] = e
		}
	}
	return powers, true
}

// parts is the largest denominator of an exponent that is looked for.
const parts = 12

// exponent tries a factor of 2 and of 8.
func exponent(f *kind.Formula, roles []Powers, x Factor) (*big.Rat, bool) {
	try := func(factor float64) float64 {
		var values [FactorCount]float64
		for i := range values {
			values[i] = 1
		}
		values[x] = factor
		s := scale.New()
		defer s.Release()
		for i, id := range f.From {
			base := 3.0
			if id == scale.VapourPressure {
				base = 1 // below the pressure
			}
			s.Put(id, base*roles[i].value(&values), units.Dimensionless, scale.Given, "")
		}
		return f.Value(s)
	}
	one := try(1)
	two, eight := math.Log2(try(2)/one), math.Log2(try(8)/one)
	n := math.Round(parts * two)
	if !(math.Abs(parts*two-n) < 1e-9 && math.Abs(eight-3*two) < 1e-9) {
		return nil, false
	}
	return big.NewRat(int64(n), parts), true
}

// declared are the powers of groups that kinds make by themselves, where they
// are products of powers.
func (n nature) declared(id group.ID) (Powers, bool) {
	switch id {
	case group.Strouhal: // of what sheds and forces; the shedding itself also follows the Reynolds number
		return product(to(Length, 1), to(Time, -1), to(Speed, -1)), true
	case group.KeuleganCarpenter:
		if n.gravity {
			return product(to(Speed, 1), to(Time, 1), to(Length, -1)), true
		}
		return Powers{}, true // ξ/D
	case group.Beta:
		return n.motion().plus(product(to(Length, 2), to(KinematicViscosity, -1))), true
	case group.Scruton, group.WallMassRatio:
		return product(to(SolidDensity, 1), to(FluidDensity, -1)), true
	case group.Womersley:
		return product(to(Length, 1), root(Time, -1), root(KinematicViscosity, -1)), true
	case group.ReynoldsPeak, group.ChordReynolds, group.BodyReynolds:
		return product(to(Speed, 1), to(Length, 1), to(KinematicViscosity, -1)), true
	case group.ReducedFrequencyTorsion:
		return n.natural().plus(product(to(Length, 1), to(Speed, -1))), true
	case group.TransitRatio:
		return n.natural().plus(product(to(Length, 1), to(Speed, -1))), true
	case group.FlutterIndex, group.ConveyingSpeed, group.SpeedIndex:
		return product(to(Speed, 1), root(FluidDensity, 1), root(YoungModulus, -1)), true
	case group.WallCompliance:
		return product(to(FluidDensity, 1), to(SoundSpeed, 2), to(YoungModulus, -1)), true
	case group.FluidLoading:
		return product(to(FluidDensity, 1), root(YoungModulus, 1), to(SoundSpeed, -1), term{SolidDensity, -3}), true
	case group.Taylor:
		return product(to(FluidDensity, 1), to(SoundSpeed, 1), to(Time, 1), to(SolidDensity, -1), to(Length, -1)), true
	case group.ShockPeriod:
		return n.natural().plus(product(to(Time, 1))), true
	case group.Slenderness, group.SpanRatio, group.AspectRatio, group.PitchRatio, group.ThicknessRatio:
		return Powers{}, true // a shape
	}
	return Powers{}, false
}

// powers returns the powers of a group in a case of this nature; false where it
// is no product of powers of the factors.
func (n nature) powers(id group.ID) (Powers, bool) {
	if results[id] {
		return Powers{}, false
	}
	if f := kind.FormulaOf(id); f != nil {
		return n.ofFormula(f)
	}
	return n.declared(id)
}

// wet reports whether a group is made with the wet natural frequency, which
// scales like the dry one only where the mass ratio is kept.
func (n nature) wet(id group.ID) bool {
	switch id {
	case group.TransitRatio, group.ShockPeriod:
		return true
	case group.Beta:
		return !n.forced
	}
	f := kind.FormulaOf(id)
	if f == nil {
		return false
	}
	for _, s := range f.From {
		if s == scale.FrequencyWet || s == scale.FrequencyMotion && !n.forced {
			return true
		}
	}
	return false
}

// GroupNames lists the groups that can be kept.
func GroupNames() []string {
	var list []string
	for id := range group.Count {
		if _, can := (nature{}).powers(id); can {
			list = append(list, group.Of(id).ID)
		}
	}
	return list
}
