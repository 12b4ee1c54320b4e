package kind

import (
	"fmt"
	"math"

	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// atMost says whether x is not above a limit, but for the last digits: the
// same length in two units must lie on the same side of a rule.
func atMost(x, limit float64) bool { return x <= limit*(1+1e-9) }

// UncertainCode is the code of the warning that an input is taken at its middle.
// An answer that carries the spread of its inputs does without it.
const UncertainCode = "uncertain"

// uncertain says which inputs are uncertain, and where they are taken.
func (r *Resolver) uncertain() {
	for i := range r.c.Given() {
		v := &r.c.Given()[i]
		switch v.Field.Type {
		case input.Quantity:
			r.middle(v.Field, v.Q, v.Field.Kind)
		case input.Number:
			r.middle(v.Field, v.Q, units.Dimensionless)
		case input.Interval:
			r.middle(v.Field, v.Ends[0], v.Field.Kind)
			r.middle(v.Field, v.Ends[1], v.Field.Kind)
		}
	}
}

func (r *Resolver) middle(f *input.Field, q units.Quantity, k units.Kind) {
	if q.Form == units.Certain {
		return
	}
	r.warn(f, UncertainCode, fmt.Sprintf("%s is uncertain; single numbers and verdicts are those at its middle, %s.", f.Path(), units.Format(q.Value, k)))
}

// band warns, and never refuses, where a value lies outside what is usual.
func (r *Resolver) band(f *input.Field, id scale.ID, lo, hi float64, mistake string) {
	if !r.c.Has(f) {
		return
	}
	x := r.X(id)
	if x >= lo && x <= hi {
		return
	}
	r.warn(f, "implausible", fmt.Sprintf("%s of %s lies outside the usual %s to %s; %s.", f.Path(),
		units.Format(x, f.Kind), units.Format(lo, f.Kind), units.Format(hi, f.Kind), mistake))
}

// plausibleFluid holds the given properties of the fluid against what is usual.
func (r *Resolver) plausibleFluid() {
	if r.Is(group.Liquid) {
		r.band(FluidDensity, scale.Density, 500, 14000, "check the unit: g/cm³ and kg/m³ are a factor of a thousand apart")
		if x := r.X(scale.Viscosity); r.c.Has(FluidViscosity) && x > 1e3 {
			r.warn(FluidViscosity, "implausible", "A viscosity above 1000 Pa·s is rare; was cP meant for Pa·s, or a kinematic viscosity?")
		}
	}
	r.band(FluidSoundSpeed, scale.SoundSpeed, 100, 3000, "check the unit, and whether the sound speed of the solid was meant")
}

// plausibleSolid holds the given properties of the solid against what is usual.
func (r *Resolver) plausibleSolid() {
	r.band(SolidDensity, scale.SolidDensity, 10, 23000, "mm-t-s systems have 7.85e-9 t/mm³ for steel, and pounds are not slugs")
	r.band(Young, scale.Young, 1e3, 1.2e12, "check MPa against Pa")
	if !r.c.Has(Young) && !r.c.Has(SolidDensity) {
		return
	}
	if a := math.Sqrt(r.X(scale.Young) / r.X(scale.SolidDensity)); a < 10 || a > 20000 {
		f := Young
		if !r.c.Has(f) {
			f = SolidDensity
		}
		r.warn(f, "implausible", fmt.Sprintf("√(E/ρ) = %s lies outside the usual 10 m/s to 20 km/s; modulus and density may be in different systems of units.", units.Format(a, units.Speed)))
	}
}
