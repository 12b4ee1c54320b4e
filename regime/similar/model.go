package similar

import (
	"fmt"
	"math"
	"strconv"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
	"regimed/units"
)

// Model is the case of the model.
type Model struct {
	Case       *input.Case
	Answer     *regime.Answer    // nil where the model is no case
	Fields     []ScaledField     // what was given, scaled
	Violations []input.Violation // what is wrong with the model, located in its case
}

// ScaledField is one quantity of the case with that of the model.
type ScaledField struct {
	Place     input.Place
	Kind      units.Kind
	Quantity  string // id; empty for a group that was given
	Prototype float64
	Model     float64
}

// builder makes the case of a model.
type builder struct {
	*work
	c *input.Case
}

// model makes the case of the model and judges it.
func (w *work) model() {
	b := &builder{work: w, c: w.Request.Case.Clone()}
	b.material()
	b.scalars()
	b.fluidOfModel()
	b.gravity()
	b.pressures()
	b.title()
	w.Model.Case = b.c
	if len(w.Model.Violations) > 0 {
		return
	}
	w.Model.Answer, w.Model.Violations = regime.Classify(b.c)
	if w.Model.Answer != nil {
		w.Comparison = Compare(w.Prototype, w.Model.Answer, w.Request.Tolerance)
	}
}

// Digits to which numbers of the model are kept: what is written is what was
// judged.
const modelDigits = 12

// rounded leaves off the digits that rounding made.
func rounded(x float64) float64 {
	y, err := strconv.ParseFloat(strconv.FormatFloat(x, 'g', modelDigits, 64), 64)
	if err != nil {
		return x
	}
	return y
}

// put sets a place of the model, and records what its field does not allow.
func (b *builder) put(p input.Place, x float64) bool {
	x = rounded(x)
	if good := b.c.Set(p, x) && !math.IsNaN(x) && !math.IsInf(x, 0); good {
		return true
	}
	b.refuse(p, x)
	return false
}

func (b *builder) refuse(p input.Place, x float64) {
	rule := "a finite number"
	if p.Field.Rule != "" {
		rule = input.RuleText(p.Field)
	}
	b.Model.Violations = append(b.Model.Violations, input.Violation{Pointer: p.Pointer(), Code: input.OutOfRange,
		Sentence: fmt.Sprintf("%s of the model would be %s; it must be %s.", p.Path(), units.Format(x, p.Kind()), rule)})
}

// scalars scales what was given, each by the factor of its quantity. Pure numbers,
// angles, temperatures, and the properties of the fluid, stay.
func (b *builder) scalars() {
	for _, p := range b.Request.Case.Places() {
		if p.Field.Of == "fluid" || p.Field == kind.Gravity || p.Field == kind.AmbientPressure {
			continue
		}
		old := *b.Request.Case.At(p)
		id, factor := "", 1.0
		switch i := quantityOf(p); {
		case p.Field.Of == "given_groups":
			factor = b.givenGroup(p)
		case i >= 0:
			id, factor = quantityDefs[i].ID, b.factorOf(i)
		case p.Kind() == units.Pressure:
			continue // see pressures
		default:
			continue
		}
		b.scalePlace(p, old, factor)
		b.Model.Fields = append(b.Model.Fields, ScaledField{Place: p, Kind: p.Kind(), Quantity: id, Prototype: old.Value, Model: b.valueAt(p)})
	}
}

func (b *builder) valueAt(p input.Place) float64 {
	if q := b.c.At(p); q != nil {
		return q.Value
	}
	return math.NaN()
}

// scalePlace multiplies a value and its spread.
func (b *builder) scalePlace(p input.Place, old units.Quantity, factor float64) {
	at := b.c.At(p)
	if at == nil {
		return // replaced, as a material is
	}
	x, spread := rounded(old.Value*factor), rounded(old.Spread*factor)
	if math.IsNaN(x) || math.IsInf(x, 0) || math.IsInf(spread, 0) || old.Value != 0 && x == 0 || !p.Field.Allows(x) {
		b.refuse(p, x)
		return
	}
	at.Value, at.Spread = x, spread
}

// givenGroup is the factor of a group that the case gives in place of a quantity.
func (b *builder) givenGroup(p input.Place) float64 {
	id, _ := group.Find(p.Field.Name)
	powers, can := b.nature.powers(id)
	if !can {
		return 1
	}
	_, x := b.inGiven(powers)
	return x
}

// material replaces a solid by name with values where the model is of another one.
func (b *builder) material() {
	e, rho := b.Factors[YoungModulus].Value, b.Factors[SolidDensity].Value
	if !b.c.Has(kind.MaterialName) || e == 1 && rho == 1 {
		return
	}
	b.c = b.c.Without(kind.MaterialName)
	block := b.c.Schema.Kind(b.c.Kind)
	for _, v := range []struct {
		field  *input.Field
		id     scale.ID
		factor float64
	}{{kind.SolidDensity, scale.SolidDensity, rho}, {kind.Young, scale.Young, e}, {kind.PoissonRatio, scale.Poisson, 1}, {kind.LinearStrain, scale.LinearStrain, 1}} {
		if x := b.Prototype.Scales.X(v.id); block.Find(v.field.Name) == v.field && !b.c.Has(v.field) && !math.IsNaN(x) {
			p := input.Place{Field: v.field}
			if b.put(p, x*v.factor) && quantityOf(p) >= 0 {
				b.Model.Fields = append(b.Model.Fields, ScaledField{Place: p, Kind: p.Kind(), Quantity: quantityDefs[quantityOf(p)].ID, Prototype: x, Model: b.valueAt(p)})
			}
		}
	}
	b.note(kind.MaterialName.Pointer(), "material-by-values", "The model is of another material than the prototype: its values stand in the place of the name.")
}

// propertyFields are the fields of a fluid by values.
var propertyFields = []struct {
	field *input.Field
	id    scale.ID
	by    []Factor
}{
	{kind.FluidDensity, scale.Density, []Factor{FluidDensity}},
	{kind.FluidViscosity, scale.Viscosity, []Factor{FluidDensity, KinematicViscosity}},
	{kind.FluidSoundSpeed, scale.SoundSpeed, []Factor{SoundSpeed}},
	{kind.FluidVapour, scale.VapourPressure, nil},
	{kind.FluidTension, scale.SurfaceTension, []Factor{SurfaceTension}},
	{kind.FluidHeatRatio, scale.HeatCapacityRatio, nil},
	{kind.FluidPrandtl, scale.Prandtl, nil},
}

// fluidOfModel puts the fluid of the model in: the one that was asked for, or one
// by values where the factors of its properties are not 1.
func (b *builder) fluidOfModel() {
	if b.fluid != nil {
		if b.c.Has(altitudeOf(b.c)) {
			b.note("/structure/altitude", "altitude-dropped", "The altitude set the state of the prototype's air; the model is in a fluid of its own.")
		}
		given := b.c.Clone()
		b.c = withFluid(b.c, b.Request.Fluid)
		for _, v := range given.Given() { // groups go on, scaled; and the pressure of a liquid
			if v.Field.Of == "given_groups" || v.Field == kind.FluidPressure && !b.fluidHasPressure() && !b.isGas() {
				b.c = b.c.With(v)
			}
		}
		return
	}
	changed := false
	for _, f := range []Factor{FluidDensity, KinematicViscosity, SoundSpeed, SurfaceTension} {
		changed = changed || b.Factors[f].Value != 1 && !math.IsNaN(b.Factors[f].Value)
	}
	if changed && b.Prototype.Groups.Is(group.Fluid) {
		b.fluidByValues()
	}
}

func altitudeOf(c *input.Case) *input.Field {
	return c.Schema.Kind(c.Kind).Find("altitude")
}

func (b *builder) fluidByValues() {
	named := b.c.Has(kind.FluidName)
	if b.c.Has(altitudeOf(b.c)) { // which set the pressure, too
		b.put(input.Place{Field: kind.FluidPressure}, b.Prototype.Scales.X(scale.Pressure))
	}
	for _, f := range []*input.Field{kind.FluidName, kind.FluidTemperature, kind.FluidSalinity, kind.FluidKinematic, altitudeOf(b.c)} {
		if f != nil {
			b.c = b.c.Without(f)
		}
	}
	for _, v := range propertyFields {
		x := b.Prototype.Scales.X(v.id)
		if math.IsNaN(x) {
			continue
		}
		for _, f := range v.by {
			x *= b.Factors[f].Value
		}
		if p := (input.Place{Field: v.field}); b.put(p, x) {
			b.Model.Fields = append(b.Model.Fields, ScaledField{Place: p, Kind: p.Kind(), Quantity: propertyQuantity[v.field], Prototype: b.Prototype.Scales.X(v.id), Model: b.valueAt(p)})
		}
	}
	if !b.c.Has(kind.FluidPhase) && b.Prototype.Groups.Any(group.Liquid|group.Gas) {
		phase := "liquid"
		if b.Prototype.Groups.Is(group.Gas) {
			phase = "gas"
		}
		b.c = b.c.With(input.Value{Field: kind.FluidPhase, Text: phase})
	}
	if named {
		b.note(kind.FluidName.Pointer(), "fluid-by-values", "The model needs another fluid than the prototype's: its properties stand in the place of the name. Whether there is such a fluid is not said.")
	}
}

var propertyQuantity = map[*input.Field]string{
	kind.FluidDensity: "fluid_density", kind.FluidViscosity: "dynamic_viscosity", kind.FluidSoundSpeed: "sound_speed", kind.FluidTension: "surface_tension",
}

func (b *builder) gravity() {
	g := b.Factors[Gravity].Value
	p := input.Place{Field: kind.Gravity}
	if g == 1 && !b.c.Has(kind.Gravity) {
		return
	}
	old := b.Prototype.Scales.X(scale.Gravity)
	if g != 1 {
		b.put(p, old*g)
	}
	b.Model.Fields = append(b.Model.Fields, ScaledField{Place: p, Kind: units.Acceleration, Quantity: "gravity", Prototype: old, Model: b.valueAt(p)})
}

// pressures sets the absolute pressures of the model. In a liquid those of a
// pressure that was scaled go from the vapour pressure on,
//
//	p′ = p_v′ + λ_p (p − p_v),
//
// and the surroundings make up what the depth does not give; where the surroundings
// stay, a pressure that was given goes with the pressure of the flow above theirs.
// A gas keeps its pressure, on which its properties depend.
func (b *builder) pressures() {
	s := b.Prototype.Scales
	ambient := s.X(scale.AmbientPressure)
	flow := b.factorOf(quantityIndex("pressure"))
	above, now := ambient, ambient // from where pressures are counted, in prototype and model
	by := flow
	static := &b.Factors[StaticPressure]
	liquid := b.Prototype.Groups.Is(group.Liquid) && !b.isGas()
	stays := static.Rule != nil && static.Rule.ID == sameSurroundings.ID
	if liquid && !stays && static.Origin != Unknown && s.Has(scale.VapourPressure) {
		above, by = s.X(scale.VapourPressure), static.Value
		now = above
		if b.fluid != nil {
			now = b.fluid.X(scale.VapourPressure)
		}
		b.surround(above, now, by)
	}
	if liquid && !b.fluidHasPressure() {
		b.absolute(kind.FluidPressure, above, now, by)
	}
	if f := b.c.Schema.Kind(b.c.Kind).Find("external_pressure"); f != nil {
		b.external(f, flow)
	}
}

func (b *builder) fluidHasPressure() bool {
	for _, v := range b.Request.Fluid {
		if v.Field == kind.FluidPressure {
			return true
		}
	}
	return false
}

// surround sets the pressure of the surroundings of a model whose static pressure
// is scaled.
func (b *builder) surround(above, now, by float64) {
	s := b.Prototype.Scales
	p := input.Place{Field: kind.AmbientPressure}
	old := s.X(scale.AmbientPressure)
	x := now + by*(old-above)
	if d := s.X(scale.Depth); b.c.Has(kind.DepthBelowSurface) && !b.c.Has(kind.FluidPressure) {
		column := s.X(scale.Density) * s.X(scale.Gravity) * d
		ratio := b.Factors[FluidDensity].Value * b.Factors[Gravity].Value * b.Factors[Length].Value
		x += (by - ratio) * column
	}
	if by == 1 && now == above && x == old {
		return
	}
	if b.put(p, x) {
		b.Model.Fields = append(b.Model.Fields, ScaledField{Place: p, Kind: units.Pressure, Quantity: "static_pressure", Prototype: old, Model: b.valueAt(p)})
	}
}

// absolute scales an absolute pressure of the fluid, counted from another one. A
// gauge pressure counts from the surroundings, which stand apart.
func (b *builder) absolute(f *input.Field, above, now, by float64) {
	v := b.Request.Case.Lookup(f)
	if v == nil || !b.c.Has(f) {
		return
	}
	p := input.Place{Field: f}
	if v.Q.Gauge {
		b.scalePlace(p, v.Q, by)
	} else {
		b.moved(p, v.Q, above, now, by)
	}
	b.Model.Fields = append(b.Model.Fields, ScaledField{Place: p, Kind: units.Pressure, Quantity: "static_pressure", Prototype: v.Q.Value, Model: b.valueAt(p)})
}

// moved scales a value that counts from another zero, and its spread.
func (b *builder) moved(p input.Place, old units.Quantity, above, now, by float64) {
	at := b.c.At(p)
	form, spread := at.Form, rounded(old.Spread*by)
	if by == 1 && above == now {
		return
	}
	if b.put(p, now+by*(old.Value-above)) {
		at.Form, at.Spread = form, spread
	}
}

// external scales a pressure around the structure by its difference from that of
// the fluid.
func (b *builder) external(f *input.Field, flow float64) {
	v := b.Request.Case.Lookup(f)
	if v == nil {
		return
	}
	inside := b.Prototype.Scales.X(scale.Pressure)
	within := inside
	if q := b.c.Lookup(kind.FluidPressure); q != nil && !q.Q.Gauge {
		within = q.Q.Value
	} else if q := b.c.Lookup(kind.AmbientPressure); q != nil {
		within = q.Q.Value
	}
	b.absolute(f, inside, within, flow)
}

const longestTitle = 200

// title marks a case as that of a model.
func (b *builder) title() {
	if b.Factors[Length].Value == 1 {
		return
	}
	mark := "model " + Ratio(b.Factors[Length].Value)
	if v := b.c.Lookup(kind.Title); v != nil {
		room := longestTitle - len(mark) - 3
		old := []rune(v.Text)
		for len(string(old)) > room {
			old = old[:len(old)-1]
		}
		mark = string(old) + " (" + mark + ")"
	}
	b.c = b.c.With(input.Value{Field: kind.Title, Text: mark})
}

// Ratio writes a factor as model makers do: "1:40", "2.5:1".
func Ratio(x float64) string {
	digits := func(x float64) string { return string(units.AppendNumber(nil, x, 4)) }
	if x <= 1 {
		return "1:" + digits(1/x)
	}
	return digits(x) + ":1"
}
