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

// The active part: piezoelectric, or a moving coil.
var (
	ActiveCoupling   = pure("electromechanical_coupling", "gte=0,lte=99", "generalised coupling K² of the mode; structure.frequency_dry then is the one in short circuit", "")
	ActiveFactor     = pure("coupling_factor", "gte=0,lte=0.99", "coupling factor k of the mode, in place of K² = k²/(1 − k²)", "")
	ActiveShort      = quantity("frequency_short", units.Frequency, "gt=0", "measured frequency in short circuit, with frequency_open in place of K²", "")
	ActiveOpen       = quantity("frequency_open", units.Frequency, "gt=0", "measured frequency in open circuit", "")
	ActiveCapacity   = quantity("capacitance", units.Capacitance, "gt=0", "capacitance of the piezoelectric part, clamped", "")
	ActiveLoad       = quantity("load_resistance", units.Resistance, "gte=0", "resistance across the part; of a coil that of the circuit outside it", "an open circuit; of a coil none beside its own")
	ActiveForce      = quantity("force_factor", units.ForceFactor, "gt=0", "force factor Bl of a moving coil", "")
	ActiveResistance = quantity("coil_resistance", units.Resistance, "gt=0", "resistance of the coil", "")
	ActiveMaxwell    = quantity("maxwell_stress", units.Modulus, "gt=0", "Maxwell stress εE² of a membrane of dielectric elastomer, E the voltage over the undeformed thickness", "")
	ActiveShear      = quantity("shear_modulus", units.Modulus, "gt=0", "shear modulus of the elastomer", "a third of structure.young_modulus")
	activeBlock      = &input.Block{Name: "active", Title: "Active part", Doc: "a piezoelectric part by its coupling, a moving coil by its force factor, or a dielectric elastomer by its Maxwell stress, on any structure",
		Fields: []*input.Field{ActiveMaxwell, ActiveShear, ActiveCoupling, ActiveFactor, ActiveShort, ActiveOpen, ActiveCapacity, ActiveLoad, ActiveForce, ActiveResistance}}
)

// active takes the active part, once the masses of the kind are known.
func (r *Resolver) active() {
	if !r.c.HasBlock(activeBlock.Name) {
		return
	}
	coil := r.c.Has(ActiveForce) || r.c.Has(ActiveResistance)
	piezo := r.c.Has(ActiveCoupling) || r.c.Has(ActiveFactor) || r.c.Has(ActiveShort) || r.c.Has(ActiveOpen) || r.c.Has(ActiveCapacity)
	if elastomer := r.c.Has(ActiveMaxwell) || r.c.Has(ActiveShear); elastomer {
		r.elastomer(coil || piezo)
		return
	}
	r.trait(group.Active)
	switch {
	case coil && piezo:
		r.contradict(ActiveForce, "An active part is piezoelectric or a moving coil, not both.")
	case coil:
		r.coil()
	default:
		r.piezo()
	}
}

// elastomer takes a membrane of dielectric elastomer.
func (r *Resolver) elastomer(other bool) {
	if other {
		r.contradict(ActiveMaxwell, "An active part is a dielectric elastomer, piezoelectric or a moving coil, only one of them.")
		return
	}
	r.trait(group.Dielectric)
	r.takeOrNeed(scale.MaxwellStress, ActiveMaxwell)
	if r.take(scale.ShearModulus, ActiveShear) {
		return
	}
	r.derive(scale.ShearModulus, r.X(scale.Young)/3, units.Modulus, "E/3 of an incompressible solid")
	r.Need(scale.ShearModulus, ActiveShear.Path())
	r.Value(scale.ShearModulus).Kind = units.Modulus
}

func (r *Resolver) coil() {
	if r.Value(scale.DryMass).Kind != units.Mass {
		r.contradict(ActiveForce, fmt.Sprintf("A moving coil drives one mass, and a %s moves along its length or area: use a piston or a generic body.", r.kind.Name))
		return
	}
	r.takeOrNeed(scale.ForceFactor, ActiveForce)
	r.takeOrNeed(scale.CoilResistance, ActiveResistance)
	if !r.take(scale.LoadResistance, ActiveLoad) {
		r.Put(scale.LoadResistance, 0, units.Resistance, scale.Assumed, "an amplifier whose output has no resistance")
	}
}

func (r *Resolver) piezo() {
	r.coupling()
	if r.take(scale.LoadResistance, ActiveLoad) {
		r.takeOrNeed(scale.Capacitance, ActiveCapacity)
		return
	}
	r.take(scale.Capacitance, ActiveCapacity)
	r.warn(ActiveLoad, "assumed", "The circuit is taken as open: it takes no power, and raises the frequency by all of its coupling.")
}

// coupling resolves K² from one of its three forms; they must agree.
func (r *Resolver) coupling() {
	r.Need(scale.ElectromechanicalCoupling, ActiveCoupling.Path())
	short, open := r.c.X(ActiveShort), r.c.X(ActiveOpen)
	if r.c.Has(ActiveShort) != r.c.Has(ActiveOpen) {
		f := ActiveShort
		if r.c.Has(f) {
			f = ActiveOpen
		}
		r.violations.Add(f.Pointer(), input.MissingField, "The coupling follows from two frequencies, in short and in open circuit.", nil)
		return
	}
	if open < short {
		r.contradict(ActiveOpen, "The frequency in open circuit lies below that in short circuit.")
		return
	}
	k := r.c.X(ActiveFactor)
	factor, err := canon.GeneralisedCoupling(k * k)
	if err != nil {
		factor = math.NaN()
	}
	forms := []struct {
		field *input.Field
		x     float64
		how   string
	}{{ActiveCoupling, r.c.X(ActiveCoupling), ""}, {ActiveFactor, factor, "k²/(1 − k²)"}, {ActiveOpen, open*open/(short*short) - 1, "(f_open/f_short)² − 1"}}
	for _, f := range forms {
		switch {
		case math.IsNaN(f.x):
		case r.Has(scale.ElectromechanicalCoupling):
			if x := r.X(scale.ElectromechanicalCoupling); math.Abs(f.x-x) > 0.05*math.Max(x, f.x) {
				r.contradict(f.field, fmt.Sprintf("%s means K² = %.3g, but what stands beside it means %.3g.", f.field.Path(), f.x, x))
			}
		case f.how == "":
			r.take(scale.ElectromechanicalCoupling, f.field)
		case f.x > 99:
			r.violations.Add(f.field.Pointer(), input.OutOfRange, fmt.Sprintf("%s means K² = %.3g; the range ends at 99.", f.field.Path(), f.x), nil)
		default:
			r.derive(scale.ElectromechanicalCoupling, f.x, units.Dimensionless, f.how)
		}
	}
}

// activeGroups puts what the circuit does to the mode.
func activeGroups(s *scale.Set, g *group.Set) {
	if g.Is(group.Dielectric) {
		putOrWait(s, g, group.PullIn, math.Sqrt(s.X(scale.MaxwellStress)/(pullInStress*s.X(scale.ShearModulus))), scale.MaxwellStress, scale.ShearModulus)
		return
	}
	if !g.Is(group.Active) {
		return
	}
	if s.Needs(scale.ElectromechanicalCoupling) == "" && !s.Has(scale.ElectromechanicalCoupling) {
		coilGroups(s, g)
		return
	}
	piezoGroups(s, g)
}

// coilGroups puts the damping of a moving coil.
//
//	ζ_e = (Bl)²/(2 R m_w ω_w), R = R_e + R_load
//
// Symbols: Bl force factor (N/A), R_e, R_load resistances (Ω), m_w wet mass (kg),
// ω_w wet circular frequency (1/s). Range: below the frequency at which the
// inductance of the coil counts. Accuracy: exact there. Check: Bl 5 T m, R 5 Ω,
// m 10 g, 2000 N/m in a vacuum: (Bl)²/R = 5 kg/s, ζ_e = 0.559. Source: Kinsler et
// al. 2000, chapter 14, from memory.
func coilGroups(s *scale.Set, g *group.Set) {
	needs := []scale.ID{scale.ForceFactor, scale.CoilResistance, scale.DryMass, scale.AddedMass, scale.FrequencyWet}
	force := s.X(scale.ForceFactor)
	oscillator := 2 * wetMass(s, g) * 2 * math.Pi * s.X(scale.FrequencyWet)
	coil := force * force / s.X(scale.CoilResistance)
	putOrWait(s, g, group.DampingElectric, force*force/(s.X(scale.CoilResistance)+s.X(scale.LoadResistance))/oscillator, needs...)
	// a load of the resistance of the coil halves the damping, and takes half of it
	putOrWait(s, g, group.HarvestShare, 4*math.Pi*coil/4/oscillator, needs...)
}

// wetMass is the dry mass with what the fluid adds at the wet frequency.
func wetMass(s *scale.Set, g *group.Set) float64 {
	if !g.Is(group.Fluid) {
		return s.X(scale.DryMass)
	}
	factor := 1.0
	if g.Has(group.ViscousInertia) {
		factor = g.Get(group.ViscousInertia)
	}
	return s.X(scale.DryMass) + s.X(scale.AddedMass)*factor
}

// piezoGroups puts the coupling and the damping of a resistive load.
//
//	complex stiffness 1 + K² ir/(1 + ir), r = ωRC: ζ = ½ K² r/(1 + (1 + K²) r²)
//
// Symbols: K² coupling, R resistance (Ω), C capacitance (F). Range: K² below about
// ½ as a damping ratio. Accuracy: exact as half a loss factor. Check: r = 1/√(1 + K²)
// gives the K²/(4√(1 + K²)) of a matched load. Source: Hagood & von Flotow 1991,
// from memory.
func piezoGroups(s *scale.Set, g *group.Set) {
	k2 := s.X(scale.ElectromechanicalCoupling)
	putOrWait(s, g, group.Electromechanical, k2, scale.ElectromechanicalCoupling)
	if _, matched, _, err := canon.Electromechanical(k2); err == nil {
		g.Put(group.HarvestShare, 4*math.Pi*matched)
	}
	if !s.Has(scale.LoadResistance) {
		return
	}
	load := 2 * math.Pi * s.X(scale.FrequencyWet) * s.X(scale.LoadResistance) * s.X(scale.Capacitance)
	needs := []scale.ID{scale.ElectromechanicalCoupling, scale.Capacitance, scale.FrequencyWet}
	putOrWait(s, g, group.ElectricLoad, load, needs...)
	zeta := 0.0
	if load > 0 {
		zeta = k2 / (1/load + (1+k2)*load) / 2
	}
	if math.IsNaN(load) || math.IsNaN(k2) {
		zeta = math.NaN()
	}
	putOrWait(s, g, group.DampingElectric, zeta, needs...)
}

// quality puts the quality factor by the fluid alone, from the damping of the
// layers and of sound.
func quality(s *scale.Set, g *group.Set) {
	zeta := 0.0
	if g.Has(group.DampingViscous) {
		zeta = g.Get(group.DampingViscous)
	}
	mass := wetMass(s, g)
	for _, id := range []group.ID{group.ViscousDamping, group.AcousticDamping} {
		if g.Has(id) {
			zeta += 0.5 * s.X(scale.AddedMass) * g.Get(id) / mass
		}
	}
	if zeta > 0 {
		g.Put(group.QualityFluid, 1/(2*zeta))
		return
	}
	waitFor(s, g, []scale.ID{scale.FrequencyWet, scale.DryMass, scale.AddedMass}, group.QualityFluid)
}

// pullInStress is εE²/μ at which a membrane of ideal dielectric elastomer,
// stretched alike both ways by the voltage alone, pulls itself in.
//
//	max over λ of λ⁻² − λ⁻⁸ = ¾·4^(−1/3) = 0.47247, at λ = 4^(1/6) = 1.26
//
// Symbols: ε permittivity, E voltage over the undeformed thickness, μ shear
// modulus of a neo-Hookean solid, λ stretch. Range: no prestretch, which would
// raise it. Accuracy: exact for that solid. Check: E√(ε/μ) = 0.687.
// Source: Zhao & Suo 2007, from memory.
var pullInStress = 0.75 * math.Pow(4, -1.0/3)
