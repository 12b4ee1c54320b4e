package kind

import (
	"errors"
	"fmt"
	"math"
	"slices"

	"regimed/regime/fluid"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/regime/solid"
	"regimed/units"
)

// Resolver fills the scales of one case.
type Resolver struct {
	*scale.Set
	group.Traits
	c          *input.Case
	kind       *Kind
	given      []GivenGroup
	throat     float64 // speed at the structure over that of the stream, 0: the same
	warnings   []Warning
	violations input.Violations
}

func newResolver(c *input.Case, k *Kind) *Resolver {
	r := &Resolver{Set: scale.New(), c: c, kind: k}
	for i, f := range givenFields {
		if v := c.Lookup(f); v != nil {
			r.given = append(r.given, GivenGroup{ID: givenGroups[i], Value: v.Q.Value})
		}
	}
	return r
}

func (r *Resolver) trait(t group.Traits) { r.Traits |= t }

func (r *Resolver) warn(f *input.Field, code, sentence string) {
	w := Warning{Pointer: f.Pointer(), Code: code, Sentence: sentence}
	if !slices.Contains(r.warnings, w) { // several steps may notice the same
		r.warnings = append(r.warnings, w)
	}
}

func (r *Resolver) contradict(f *input.Field, sentence string) {
	r.violations.Add(f.Pointer(), input.Contradiction, sentence, nil)
}

// take puts a field that was given into a scale, and returns whether it was.
func (r *Resolver) take(id scale.ID, f *input.Field) bool {
	v := r.c.Lookup(f)
	if v == nil {
		return false
	}
	k := f.Kind
	if f.Type == input.Number {
		k = units.Dimensionless
	}
	r.Put(id, v.Q.Value, k, scale.Given, "")
	return true
}

// takeOr puts a field into a scale, or what is assumed in its place.
func (r *Resolver) takeOr(id scale.ID, f *input.Field, otherwise float64, why string) {
	if !r.take(id, f) {
		r.Put(id, otherwise, f.Kind, scale.Assumed, why)
	}
}

// takeOrNeed puts a field into a scale, or records that it is the input to ask for.
func (r *Resolver) takeOrNeed(id scale.ID, f *input.Field) {
	if !r.take(id, f) {
		r.Need(id, f.Path())
		r.Value(id).Kind = f.Kind
	}
}

func (r *Resolver) derive(id scale.ID, x float64, k units.Kind, how string) {
	r.Put(id, x, k, scale.Derived, how)
}

// pressureOf returns an absolute pressure; a gauge pressure needs the ambient one.
func (r *Resolver) pressureOf(f *input.Field) (float64, bool) {
	v := r.c.Lookup(f)
	if v == nil {
		return 0, false
	}
	if !v.Q.Gauge {
		return v.Q.Value, true
	}
	ambient := r.c.Lookup(AmbientPressure)
	if ambient == nil {
		r.violations.Add(f.Pointer(), input.WrongMeaning, fmt.Sprintf("%s is a gauge pressure; give %s too, or an absolute pressure.", f.Path(), AmbientPressure.Path()), nil)
		return 0, false
	}
	if p := v.Q.Value + ambient.Q.Value; p > 0 {
		return p, true
	}
	r.violations.Add(f.Pointer(), input.OutOfRange, f.Path()+" lies below a vacuum.", nil)
	return 0, false
}

// fluid resolves the properties of the fluid.
func (r *Resolver) fluid() {
	r.takeOr(scale.Gravity, Gravity, 9.80665, "standard gravity")
	if v := r.c.Lookup(AmbientPressure); v != nil && v.Q.Gauge {
		r.violations.Add(AmbientPressure.Pointer(), input.WrongMeaning, "The ambient pressure is absolute; a gauge pressure has no zero of its own.", nil)
		return
	}
	r.takeOr(scale.AmbientPressure, AmbientPressure, 101325, "standard atmosphere")
	if !r.c.HasBlock("fluid") {
		if r.c.HasBlock("flow") {
			r.violations.Add("/fluid", input.MissingField, "A flow needs a fluid.", nil)
		}
		return
	}
	r.trait(group.Fluid)
	p, given := r.pressureOf(FluidPressure)
	if given {
		r.Put(scale.Pressure, p, units.Pressure, scale.Given, "")
	} else {
		p = r.X(scale.AmbientPressure)
		r.Put(scale.Pressure, p, units.Pressure, r.Value(scale.AmbientPressure).Origin, "the ambient pressure")
	}
	if r.c.Has(FluidName) {
		r.namedFluid(fluid.Find(r.c.Choice(FluidName, "")), p)
	}
	r.fluidByValues()
	r.phase()
	r.plausibleFluid()
}

// namedFluid looks the properties of a fluid up at its state.
func (r *Resolver) namedFluid(m *fluid.Model, p float64) {
	state := m.Default
	state.Pressure = p
	note := m.Title
	r.takeOr(scale.Temperature, FluidTemperature, state.Temperature, "reference temperature of "+m.Name)
	state.Temperature = r.X(scale.Temperature)
	switch {
	case m.UsesSalinity:
		r.takeOr(scale.Salinity, FluidSalinity, m.Default.Salinity, "mean of the oceans")
		state.Salinity = r.X(scale.Salinity)
	case r.c.Has(FluidSalinity):
		state.Salinity = r.c.X(FluidSalinity)
	}
	q, err := m.At(state)
	if err != nil {
		r.refuseFluid(m, err)
		return
	}
	look := func(id scale.ID, x float64, k units.Kind) { r.Put(id, x, k, scale.LookedUp, note) }
	look(scale.Density, q.Density, units.Density)
	look(scale.Viscosity, q.Viscosity, units.DynamicViscosity)
	look(scale.SoundSpeed, q.SoundSpeed, units.Speed)
	look(scale.VapourPressure, q.VapourPressure, units.Pressure)
	look(scale.SurfaceTension, q.SurfaceTension, units.SurfaceTension)
	look(scale.HeatCapacityRatio, q.HeatCapacityRatio, units.Dimensionless)
	look(scale.Prandtl, q.Prandtl, units.Dimensionless)
	if q.Phase == fluid.Gas {
		r.trait(group.Gas)
	} else {
		r.trait(group.Liquid)
	}
	if m.Typical {
		r.warn(FluidName, "typical-values", fmt.Sprintf("The properties of %s are typical values; measured ones are better.", m.Title))
	}
}

func (r *Resolver) refuseFluid(m *fluid.Model, err error) {
	pointer := FluidName.Pointer()
	var out *fluid.RangeError
	if errors.As(err, &out) {
		switch out.Input {
		case fluid.Temperature:
			pointer = FluidTemperature.Pointer()
		case fluid.Pressure:
			pointer = FluidPressure.Pointer()
			if !r.c.Has(FluidPressure) && r.c.Has(AmbientPressure) {
				pointer = AmbientPressure.Pointer()
			}
		case fluid.Salinity:
			pointer = FluidSalinity.Pointer()
		}
	}
	r.violations.Add(pointer, input.OutOfRange, fmt.Sprintf("The properties of %s can't be given: %s.", m.Name, err), nil)
}

// fluidByValues takes the properties that were given; they go before those of
// a named fluid.
func (r *Resolver) fluidByValues() {
	r.takeOrNeed(scale.Density, FluidDensity)
	if v, ok := r.pressureOf(FluidVapour); ok {
		r.Put(scale.VapourPressure, v, units.Pressure, scale.Given, "")
	} else {
		r.Need(scale.VapourPressure, FluidVapour.Path())
		r.Value(scale.VapourPressure).Kind = units.Pressure
	}
	r.takeOrNeed(scale.SoundSpeed, FluidSoundSpeed)
	if !r.take(scale.SurfaceTension, FluidTension) && (r.c.Has(DepthBelowSurface) || r.c.HasBlock("waves") || r.kind.Surface) {
		r.takeOrNeed(scale.SurfaceTension, FluidTension)
	}
	r.take(scale.HeatCapacityRatio, FluidHeatRatio)
	r.take(scale.Prandtl, FluidPrandtl)
	r.viscosity()
}

func (r *Resolver) viscosity() {
	rho := r.X(scale.Density)
	dynamic, kinematic := r.c.Lookup(FluidViscosity), r.c.Lookup(FluidKinematic)
	switch {
	case dynamic != nil && kinematic != nil:
		r.take(scale.Viscosity, FluidViscosity)
		r.take(scale.KinematicViscosity, FluidKinematic)
		if d := rho * kinematic.Q.Value; math.Abs(d/dynamic.Q.Value-1) > 0.01 {
			r.contradict(FluidKinematic, fmt.Sprintf("The viscosities disagree: ρν = %s, but %s is %s.",
				units.Format(d, units.DynamicViscosity), FluidViscosity.Path(), units.Format(dynamic.Q.Value, units.DynamicViscosity)))
		}
		return
	case kinematic != nil:
		r.take(scale.KinematicViscosity, FluidKinematic)
		r.derive(scale.Viscosity, rho*kinematic.Q.Value, units.DynamicViscosity, "ρν")
	case dynamic != nil:
		r.take(scale.Viscosity, FluidViscosity)
	}
	if kinematic == nil && r.Has(scale.Viscosity) {
		r.derive(scale.KinematicViscosity, r.X(scale.Viscosity)/rho, units.KinematicViscosity, "η/ρ")
	}
	r.Need(scale.Viscosity, FluidViscosity.Path())
	r.Need(scale.KinematicViscosity, FluidViscosity.Path())
	if dynamic != nil {
		r.Need(scale.KinematicViscosity, FluidDensity.Path())
	}
	r.Value(scale.Viscosity).Kind = units.DynamicViscosity
	if !r.Has(scale.KinematicViscosity) {
		r.Value(scale.KinematicViscosity).Kind = units.KinematicViscosity
	}
}

// Stiffness of a fluid over its pressure, ρc²/p, below which it is a gas: γ is
// between 1 and 5/3, and a liquid's bulk modulus is thousands of bars.
const gasStiffness = 10

// phase tells a liquid from a gas where the case does not: by a number without
// a unit, so that the answer does not depend on the scale of the case.
func (r *Resolver) phase() {
	switch r.c.Choice(FluidPhase, "") {
	case "liquid":
		r.Traits = r.Traits&^group.Gas | group.Liquid
	case "gas":
		r.Traits = r.Traits&^group.Liquid | group.Gas
	}
	if !r.Any(group.Liquid|group.Gas) && r.Has(scale.Density) && r.Has(scale.SoundSpeed) {
		c := r.X(scale.SoundSpeed)
		if r.X(scale.Density)*c*c/r.X(scale.Pressure) < gasStiffness {
			r.trait(group.Gas)
			r.warn(FluidPhase, "assumed", "The fluid is taken as a gas, since ρc² is of the order of its pressure.")
		} else {
			r.trait(group.Liquid)
			r.warn(FluidPhase, "assumed", "The fluid is taken as a liquid, since ρc² is far above its pressure.")
		}
	}
	if !r.Any(group.Liquid | group.Gas) {
		for _, id := range []scale.ID{scale.HeatCapacityRatio, scale.Prandtl} {
			r.Need(id, FluidPhase.Path())
		}
		return
	}
	if r.Is(group.Gas) {
		r.Value(scale.VapourPressure).Needs = ""
		if !r.Has(scale.HeatCapacityRatio) {
			r.Put(scale.HeatCapacityRatio, 1.4, units.Dimensionless, scale.Assumed, "a diatomic gas")
		}
		if !r.Has(scale.Prandtl) {
			r.Put(scale.Prandtl, 0.7, units.Dimensionless, scale.Assumed, "a diatomic gas")
		}
	}
}

// environment takes the flow, the motion and the surroundings.
func (r *Resolver) environment() {
	r.takeOrNeed(scale.Amplitude, MotionAmplitude)
	if r.c.Has(MotionAmplitude) {
		r.trait(group.Amplitude)
	}
	r.take(scale.WallGap, WallGap)
	r.take(scale.ShellDiameter, ShellDiameter)
	r.take(scale.BackingDepth, BackingDepth)
	if r.take(scale.Depth, DepthBelowSurface) && !r.c.Has(FluidPressure) && r.Has(scale.Density) {
		depth := r.X(scale.Density) * r.X(scale.Gravity) * r.X(scale.Depth)
		r.derive(scale.Pressure, r.X(scale.AmbientPressure)+depth, units.Pressure, "p₀ + ρgd")
	}
	r.waves()
	if r.kind.Name != "plate" {
		r.shock(0)
	}
	if !r.Is(group.Fluid) {
		return
	}
	if !r.c.HasBlock("flow") || r.c.Has(FlowSpeed) && r.c.X(FlowSpeed) == 0 && !r.c.Has(FlowOperating) && !r.c.Has(FlowGapSpeed) {
		if !r.Is(group.Waves) {
			r.trait(group.Still)
		}
		return
	}
	r.flow()
}

func (r *Resolver) flow() {
	if len(r.kind.Directions) == 0 {
		r.contradict(FlowSpeed, "A "+r.kind.Name+" has no mean flow.")
		return
	}
	if r.c.Has(FlowGapSpeed) && !r.kind.Gaps {
		r.contradict(FlowGapSpeed, "A "+r.kind.Name+" has no gaps between tubes; give the speed of the stream.")
		return
	}
	direction := r.c.Choice(FlowDirection, r.kind.Directions[0])
	if !slices.Contains(r.kind.Directions, direction) {
		r.violations.Add(FlowDirection.Pointer(), input.OutOfRange, fmt.Sprintf("A flow does not run %s to a %s; it runs %s.", direction, r.kind.Name, input.OrList(r.kind.Directions)), nil)
		return
	}
	switch direction {
	case "cross":
		r.trait(group.Cross)
	case "axial":
		r.trait(group.Axial)
	case "grazing":
		r.trait(group.Grazing)
	case "internal":
		r.trait(group.Internal)
	}
	if !r.c.Has(FlowDirection) && len(r.kind.Directions) > 1 {
		r.warn(FlowDirection, "assumed", fmt.Sprintf("The flow is taken to run %s.", map[string]string{"cross": "across the structure", "axial": "along the structure", "grazing": "over the surface"}[direction]))
	}
	r.takeOrNeed(scale.Speed, FlowSpeed)
	if r.take(scale.Turbulence, FlowTurbulence) {
		r.takeOrNeed(scale.TurbulenceLength, FlowGustLength)
	}
	r.operating()
	r.takeOr(scale.Incidence, FlowIncidence, 0, "the flow meets the body without incidence")
}

func (r *Resolver) operating() {
	v := r.c.Lookup(FlowOperating)
	if v == nil {
		if r.Has(scale.Speed) {
			r.Put(scale.SpeedLow, 0, units.Speed, scale.Assumed, "the flow starts from rest")
			r.Put(scale.SpeedHigh, r.X(scale.Speed), units.Speed, scale.Assumed, "the speed of the flow")
		}
		r.Need(scale.SpeedLow, FlowSpeed.Path())
		r.Need(scale.SpeedHigh, FlowSpeed.Path())
		return
	}
	low, high := v.Ends[0].Value, v.Ends[1].Value
	if r.throat > 0 {
		low, high = low*r.throat, high*r.throat
	}
	r.Put(scale.SpeedLow, low, units.Speed, scale.Given, "")
	r.Put(scale.SpeedHigh, high, units.Speed, scale.Given, "")
	if !r.Has(scale.Speed) {
		r.Put(scale.Speed, high, units.Speed, scale.Assumed, "the highest speed of operation")
	}
	if u := r.X(scale.Speed); u > high*(1+1e-12) || u < low*(1-1e-12) {
		r.warn(FlowOperating, "speed-outside-operation", "The speed of the flow lies outside the speeds of operation.")
	}
}

// damping resolves the structural damping from one of its four forms.
func (r *Resolver) damping() {
	forms := []struct {
		field *input.Field
		form  units.DampingForm
	}{{DampingRatio, units.DampingRatio}, {LogDecrement, units.LogDecrement}, {LossFactor, units.LossFactor}, {QualityFactor, units.QualityFactor}}
	first := -1.0
	var from *input.Field
	for _, f := range forms {
		v := r.c.Lookup(f.field)
		if v == nil {
			continue
		}
		zeta, err := f.form.Ratio(v.Q.Value)
		switch {
		case err != nil:
			r.violations.Add(f.field.Pointer(), input.OutOfRange, fmt.Sprintf("%s: %s.", f.field.Path(), err), nil)
			continue
		case first >= 0 && math.Abs(zeta-first) > 0.01*math.Max(zeta, first):
			r.contradict(f.field, fmt.Sprintf("%s means ζ = %.3g, but %s means ζ = %.3g.", f.field.Path(), zeta, from.Path(), first))
			continue
		}
		if first < 0 {
			first, from = zeta, f.field
		}
	}
	if first < 0 {
		r.Need(scale.Damping, DampingRatio.Path())
		r.Value(scale.Damping).Kind = units.Dimensionless
		return
	}
	if first > 0.2 {
		r.warn(from, "implausible", fmt.Sprintf("A damping ratio of %.3g is high for a structure; was a percentage meant?", first))
	}
	if from == DampingRatio {
		r.Put(scale.Damping, first, units.Dimensionless, scale.Given, "")
		return
	}
	r.derive(scale.Damping, first, units.Dimensionless, "from "+from.Name)
}

// material resolves the properties of the solid.
func (r *Resolver) material() {
	m := solid.Find(r.c.Choice(MaterialName, ""))
	look := func(id scale.ID, f *input.Field, x float64) {
		if r.take(id, f) {
			return
		}
		if m != nil {
			r.Put(id, x, f.Kind, scale.LookedUp, "typical of "+m.Title)
			return
		}
		r.Need(id, f.Path())
		r.Value(id).Kind = f.Kind
	}
	rho, e, nu, strain := math.NaN(), math.NaN(), math.NaN(), math.NaN()
	if m != nil {
		rho, e, nu, strain = m.Density, m.Young, m.Poisson, m.LinearStrain
	}
	look(scale.SolidDensity, SolidDensity, rho)
	look(scale.Young, Young, e)
	look(scale.LinearStrain, LinearStrain, strain)
	r.Need(scale.LinearStrain, LinearStrain.Path())
	if !r.take(scale.Poisson, PoissonRatio) {
		if m != nil {
			r.Put(scale.Poisson, nu, units.Dimensionless, scale.LookedUp, "typical of "+m.Title)
		} else {
			r.Put(scale.Poisson, 0.3, units.Dimensionless, scale.Assumed, "a usual metal")
		}
	}
	r.plausibleSolid()
}
