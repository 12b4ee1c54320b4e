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

// uncertain says which inputs are uncertain, and where they are taken.
func (r *Resolver) uncertain() {
	for i := range r.c.Given() {
		v := &r.c.Given()[i]
		if v.Q.Form == units.Certain || v.Field.Type != input.Quantity && v.Field.Type != input.Number {
			continue
		}
		k := v.Field.Kind
		if v.Field.Type == input.Number {
			k = units.Dimensionless
		}
		r.warn(v.Field, "uncertain", fmt.Sprintf("%s is uncertain and taken at its middle, %s; the answer does not carry its spread.", v.Field.Path(), units.Format(v.Q.Value, k)))
	}
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
