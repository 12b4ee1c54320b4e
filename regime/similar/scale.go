package similar

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"regimed/regime"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/scale"
	"regimed/units"
)

// Request is what is asked of a scaling.
type Request struct {
	Case *input.Case
	// Given are factors by the caller, model over prototype; NaN: not given.
	Given     [FactorCount]float64
	Keep      []group.ID // in order: where groups exclude each other, the first stay
	Free      []Factor   // properties of the fluid, or gravity, that may change as needed
	Fluid     []input.Value
	Tolerance float64 // relative difference up to which a group counts as kept
}

// NewRequest returns a request in which nothing is asked yet, with the usual
// tolerance.
func NewRequest(c *input.Case) *Request {
	r := &Request{Case: c, Tolerance: Kept}
	for f := range r.Given {
		r.Given[f] = math.NaN()
	}
	return r
}

// Origin says where a factor comes from.
type Origin uint8

// The origins of a factor.
const (
	Given     Origin = iota // by the caller
	Unchanged               // a property that stays as it is
	OfFluids                // the properties of the two fluids
	Follows                 // from what is given and what is kept
	Assumed                 // by a rule, where nothing else decides
	Unknown                 // a property of a fluid is not known
)

func (o Origin) String() string {
	return [...]string{"given", "unchanged", "fluids", "follows", "assumed", "unknown"}[o]
}

// Solved is one factor of a scaling.
type Solved struct {
	Factor Factor
	Value  float64 // NaN where unknown
	Powers Powers  // of the factors that are given or come with the fluids
	Origin Origin
	Rule   *Rule // where assumed: what settled it
}

// Quantity is the factor of a quantity.
type Quantity struct {
	*QuantityDef
	Value  float64
	Powers Powers   // of the given factors
	Rests  []Factor // assumed factors that it rests on
}

// KeptGroup is a group that was to be kept, and what became of it.
type KeptGroup struct {
	Group  group.ID
	Held   bool    // false: it excludes those before it, and was let go
	Factor float64 // of the group, by the scale factors: 1 where it is held
	Judged float64 // of the group, of the two answers; NaN where one has none
}

// Deviation is the factor by which a kept group would be distorted if all others
// of its set were kept.
type Deviation struct {
	Group  group.ID
	Factor float64
	Powers Powers
}

// Remedy is the factor that something given or unchanged would need for a set of
// groups to be kept together.
type Remedy struct {
	Factor Factor
	Needed float64 // factor that it would need
	Now    float64 // factor that it has
	Powers Powers  // of what is needed
	Change float64 // needed over what it is
}

// Exclusion is a smallest set of groups that exclude each other: without any one
// of them the others can be kept.
type Exclusion struct {
	Group    group.ID // that was let go
	Groups   []Deviation
	Remedies []Remedy
}

// Scaling is a case scaled to a model of it.
type Scaling struct {
	Request    *Request
	Prototype  *regime.Answer
	Factors    [FactorCount]Solved
	Quantities []Quantity
	Groups     []KeptGroup
	Exclusions []Exclusion
	Rules      []*Rule // that were used
	Model      Model
	Comparison *Comparison // of prototype and model; nil where the model is no case
	Notes      []kind.Warning

	nature nature
}

// Scale solves for the scale factors of a model, and judges the model. It returns
// violations, located in the request, where the request contradicts itself. A model
// that is no case is no violation: what is wrong with it stands in the result.
func Scale(r *Request) (*Scaling, []input.Violation) {
	a, violations := regime.Classify(r.Case)
	if len(violations) > 0 {
		return nil, within("/case", violations)
	}
	w := &work{Scaling: &Scaling{Request: r, Prototype: a, nature: natureOf(a)}}
	if violations := w.check(); len(violations) > 0 {
		return nil, violations
	}
	w.solve()
	if w.bad.Any() {
		return nil, w.bad.List()
	}
	w.quantities()
	w.model()
	w.holdAgainstModel()
	return w.Scaling, nil
}

func within(pointer string, violations []input.Violation) []input.Violation {
	list := slices.Clone(violations)
	for i := range list {
		list[i].Pointer = pointer + list[i].Pointer
	}
	return list
}

// work is a scaling in the making.
type work struct {
	*Scaling
	system
	bad     input.Violations
	fluid   *scale.Set // properties of the model's fluid, where it is another one
	traits  group.Traits
	unknown [FactorCount]bool // properties that one of the fluids lacks
}

// check holds the parts of a request against each other.
func (w *work) check() []input.Violation {
	r := w.Request
	for f, x := range r.Given {
		if !math.IsNaN(x) && !representable(x) {
			w.bad.Add("/"+factorTable[f].ID, input.OutOfRange, fmt.Sprintf("%s is a factor between 1e-30 and 1e30, model over prototype.", factorTable[f].ID), nil)
		}
	}
	for i, f := range r.Free {
		if !math.IsNaN(r.Given[f]) {
			w.bad.Add(fmt.Sprintf("/free/%d", i), input.Contradiction, factorTable[f].ID+" is given, and cannot be free too.", nil)
		}
	}
	for i, id := range r.Keep {
		if _, can := w.nature.powers(id); !can {
			w.bad.Add(fmt.Sprintf("/keep/%d", i), input.UnknownChoice, NotKeepable(group.Of(id).ID), nil)
		}
		if slices.Contains(r.Keep[:i], id) {
			w.bad.Add(fmt.Sprintf("/keep/%d", i), input.Duplicate, group.Of(id).ID+" is named twice.", nil)
		}
	}
	if !(r.Tolerance >= 0 && r.Tolerance <= 1) {
		w.bad.Add("/tolerance", input.OutOfRange, "tolerance is a number between 0 and 1.", nil)
	}
	if r.Fluid != nil {
		w.otherFluid()
	}
	if w.isGas() && !math.IsNaN(r.Given[StaticPressure]) {
		w.bad.Add("/static_pressure", input.Contradiction, "The pressure of a gas belongs to its state: give the fluid of the model with its pressure.", nil)
	}
	return w.bad.List()
}

// NotKeepable says that a name is no group that can be kept, and which can.
func NotKeepable(name string) string {
	if _, is := group.Find(name); is {
		return fmt.Sprintf("%s is no product of powers of scale factors: it follows from other groups. Those that can be kept are %s.", name, input.OrList(GroupNames()))
	}
	if len(name) > 60 {
		name = "(a long name)"
	}
	near := ""
	if list := input.Nearest(name, GroupNames()); len(list) > 0 {
		near = " Did you mean " + input.OrList(list) + "?"
	}
	return fmt.Sprintf("No group is called %q.%s Those that can be kept are %s.", name, near, input.OrList(GroupNames()))
}

// otherFluid looks up the properties of the model's fluid.
func (w *work) otherFluid() {
	r := w.Request
	for f := range FactorCount {
		d := &factorTable[f]
		switch {
		case d.fluid && !math.IsNaN(r.Given[f]):
			w.bad.Add("/"+d.ID, input.Contradiction, d.ID+" is given, but it follows from the fluid of the model.", nil)
		case d.fluid && slices.Contains(r.Free, f):
			w.bad.Add(fmt.Sprintf("/free/%d", slices.Index(r.Free, f)), input.Contradiction, d.ID+" follows from the fluid of the model, and is not free.", nil)
		}
	}
	if !w.Prototype.Groups.Is(group.Fluid) {
		w.bad.Add("/fluid", input.Contradiction, "The case has no fluid that another one could stand for.", nil)
		return
	}
	resolved, violations := w.tryFluid()
	for _, v := range violations {
		if !strings.HasPrefix(v.Pointer, "/fluid") {
			v.Pointer = "/case" + v.Pointer
		}
		w.bad.Add(v.Pointer, v.Code, v.Sentence, []byte(v.Value))
	}
	if len(violations) == 0 {
		w.fluid, w.traits = resolved.Scales, resolved.Traits
	}
}

// tryFluid resolves the case in the model's fluid. A liquid stays at the pressure
// that was given for the prototype, unless it comes with its own.
func (w *work) tryFluid() (*kind.Resolved, []input.Violation) {
	m := withFluid(w.Request.Case, w.Request.Fluid)
	if v := w.Request.Case.Lookup(kind.FluidPressure); v != nil && !m.Has(kind.FluidPressure) {
		if resolved, _, violations := kind.Resolve(m.With(*v)); len(violations) == 0 && !resolved.Traits.Is(group.Gas) {
			return resolved, nil
		}
	}
	resolved, _, violations := kind.Resolve(m)
	return resolved, violations
}

// withFluid puts a fluid in the place of that of a case. Groups that were given in
// place of quantities, and an altitude, belong to the old one.
func withFluid(c *input.Case, fluid []input.Value) *input.Case {
	m := c.Clone()
	for _, v := range c.Given() {
		if v.Field.Of == "fluid" || v.Field.Of == "given_groups" || v.Field.Path() == "structure.altitude" {
			m = m.Without(v.Field)
		}
	}
	for _, v := range fluid {
		m = m.With(v)
	}
	return m
}

// solve sets the system up and solves it.
func (w *work) solve() {
	for f := range w.values {
		w.values[f] = 1
	}
	w.facts()
	for i, id := range w.Request.Keep {
		w.keep(i, id)
	}
	if w.bad.Any() {
		return
	}
	before := w.settled()
	for _, rule := range rulesOf(w.Prototype, w.nature, w.Request.Keep) {
		w.rule(rule)
	}
	if _, known := w.solution(Length); !known {
		w.bad.Add("/length", input.MissingField, "The scale of length does not follow from what is given: give length, as \"1:40\".", nil)
		return
	}
	for _, rule := range lastRules() {
		w.rule(rule)
	}
	w.factors(before)
}

// facts are the factors that are given, or that come with the fluids.
func (w *work) facts() {
	r := w.Request
	for f := range FactorCount {
		switch {
		case !math.IsNaN(r.Given[f]):
			w.fact(f, byGiven, r.Given[f])
		case slices.Contains(r.Free, f):
		case factorTable[f].fluid || f == StaticPressure && w.isGas():
			w.property(f)
		case f == Gravity:
			w.fact(f, bySame, 1)
		}
	}
}

func (w *work) isGas() bool {
	return w.Prototype.Groups.Is(group.Gas) || w.fluid != nil && w.traits.Is(group.Gas)
}

func (w *work) fact(f Factor, from source, x float64) {
	w.values[f] = x
	w.add(fixed(f, from, x), 0)
}

// properties are the scales that factors of the fluid compare.
var properties = map[Factor]scale.ID{
	FluidDensity: scale.Density, KinematicViscosity: scale.KinematicViscosity, SoundSpeed: scale.SoundSpeed,
	SurfaceTension: scale.SurfaceTension, HeatCapacityRatio: scale.HeatCapacityRatio, StaticPressure: scale.Pressure,
}

func (w *work) property(f Factor) {
	if w.fluid == nil {
		w.fact(f, bySame, 1)
		return
	}
	id := properties[f]
	x := w.fluid.X(id) / w.Prototype.Scales.X(id)
	if !representable(x) {
		w.unknown[f] = true
		return
	}
	w.fact(f, byFluids, x)
}

// keep takes a group into the system, or records what excludes it.
func (w *work) keep(i int, id group.ID) {
	p, _ := w.nature.powers(id)
	for f := range FactorCount {
		if p.uses(f) && w.unknown[f] {
			w.bad.Add(fmt.Sprintf("/keep/%d", i), input.MissingField, fmt.Sprintf("%s needs the %s of both fluids, and one is not known.", group.Of(id).ID, factorTable[f].Title), nil)
			return
		}
	}
	if p.uses(StaticPressure) && !w.isGas() && !w.vapoursKnown() {
		w.bad.Add(fmt.Sprintf("/keep/%d", i), input.MissingField, fmt.Sprintf("%s needs the vapour pressure of the fluid: give %s.", group.Of(id).ID, kind.FluidVapour.Path()), nil)
		return
	}
	relation, c := w.add(equation{left: p, from: byKeep, keep: i}, w.Request.Tolerance)
	k := KeptGroup{Group: id, Held: relation != contradicts, Factor: 1, Judged: math.NaN()}
	if c != nil {
		k.Factor = c.deviation(len(w.equations) - 1).value(&w.values)
	}
	w.Groups = append(w.Groups, k)
	if relation == contradicts {
		w.Exclusions = append(w.Exclusions, w.exclusion(id, c))
	}
}

func (w *work) vapoursKnown() bool {
	return w.Prototype.Scales.Has(scale.VapourPressure) && (w.fluid == nil || w.fluid.Has(scale.VapourPressure))
}

// exclusion says what excludes a group, and what would reconcile it.
func (w *work) exclusion(id group.ID, c *circuit) Exclusion {
	x := Exclusion{Group: id}
	for _, i := range c.indexes() {
		e := &w.equations[i]
		d := c.deviation(i)
		switch e.from {
		case byKeep:
			x.Groups = append(x.Groups, Deviation{Group: w.Request.Keep[e.keep], Factor: d.value(&w.values), Powers: d})
		case bySame, byFluids, byGiven:
			needed := e.right.plus(d)
			change := d.value(&w.values)
			x.Remedies = append(x.Remedies, Remedy{Factor: e.factor, Powers: needed, Change: change, Now: w.values[e.factor], Needed: w.values[e.factor] * change})
		}
	}
	return x
}

// settled lists which factors are solved for.
func (w *work) settled() [FactorCount]bool {
	var known [FactorCount]bool
	for f := range FactorCount {
		_, known[f] = w.solution(f)
	}
	return known
}

// rule assumes what a factor still waits for.
func (w *work) rule(rule Rule) {
	before := w.settled()
	for f := range FactorCount {
		if rule.left.uses(f) && w.unknown[f] {
			return
		}
	}
	e := equation{left: rule.left, from: byRule}
	if rule.ID == sameSurroundings.ID && !before[StaticPressure] {
		e.right = w.surroundings()
	}
	if relation, _ := w.add(e, 0); relation != independent {
		return
	}
	w.Rules = append(w.Rules, &rule)
	for f, now := range w.settled() {
		if now && !before[f] {
			w.Factors[f].Rule = &rule
		}
	}
}

// surroundings is the factor of the pressure above the vapour pressure where the
// surroundings stay: of another liquid that of the vapour pressures.
func (w *work) surroundings() Powers {
	if w.fluid == nil || !w.vapoursKnown() {
		return Powers{}
	}
	p := w.Prototype.Scales.X(scale.AmbientPressure)
	x := (p - w.fluid.X(scale.VapourPressure)) / (p - w.Prototype.Scales.X(scale.VapourPressure))
	if !representable(x) || x == 1 {
		return Powers{}
	}
	w.values[StaticPressure] = x
	return product(to(StaticPressure, 1))
}

// factors reads the factors off the system.
func (w *work) factors(before [FactorCount]bool) {
	given := map[Factor]source{}
	for i := range w.equations {
		if e := &w.equations[i]; e.from <= byGiven {
			given[e.factor] = e.from
		}
	}
	for f := range FactorCount {
		s := &w.Factors[f]
		s.Factor, s.Value, s.Origin = f, math.NaN(), Unknown
		p, known := w.solution(f)
		if !known {
			continue
		}
		s.Powers, s.Value = p, p.value(&w.values)
		from, isFact := given[f]
		switch {
		case isFact:
			s.Origin = map[source]Origin{bySame: Unchanged, byFluids: OfFluids, byGiven: Given}[from]
		case before[f]:
			s.Origin = Follows
		default:
			s.Origin = Assumed
		}
	}
}

// inGiven writes a product of factors as one of given factors.
func (s *Scaling) inGiven(p Powers) (made Powers, value float64) {
	value = 1
	for f := range FactorCount {
		if p.uses(f) {
			made = made.plus(s.Factors[f].Powers.times(p.at(f)))
			value *= unitPower(f, p.at(f)).value(s.factorValues())
		}
	}
	return made, value
}

// factorValues are the values of all factors.
func (s *Scaling) factorValues() *[FactorCount]float64 {
	var x [FactorCount]float64
	for f := range FactorCount {
		x[f] = s.Factors[f].Value
	}
	return &x
}

// quantities makes the factors of the quantities.
func (w *work) quantities() {
	used := map[int]bool{}
	for _, p := range w.Request.Case.Places() {
		used[quantityOf(p)] = true
	}
	for i := range quantityDefs {
		if d := &quantityDefs[i]; d.Usual || used[i] {
			w.Quantities = append(w.Quantities, w.quantity(d))
		}
	}
}

func (s *Scaling) quantity(d *QuantityDef) Quantity {
	p := d.powers(s.nature)
	q := Quantity{QuantityDef: d}
	q.Powers, q.Value = s.inGiven(p)
	for f := range FactorCount {
		if p.uses(f) && s.Factors[f].Origin == Assumed {
			q.Rests = append(q.Rests, f)
		}
	}
	return q
}

// factorOf is the factor of a quantity by its index.
func (s *Scaling) factorOf(index int) float64 {
	_, x := s.inGiven(quantityDefs[index].powers(s.nature))
	return x
}

// holdAgainstModel says of each kept group what the two answers make of it.
func (w *work) holdAgainstModel() {
	if w.Comparison == nil {
		return
	}
	for i := range w.Groups {
		k := &w.Groups[i]
		if p := w.Comparison.Group(k.Group); p != nil {
			k.Judged = p.Factor
		}
		if k.Held && math.Abs(k.Judged-k.Factor) > drift {
			w.note("", "not-by-scales-alone", fmt.Sprintf("%s of the model is %s of the prototype's: it also follows from something that is not kept.",
				group.Of(k.Group).ID, string(units.AppendNumber(nil, k.Judged, 4))))
		}
	}
}

// drift is the relative difference from which a kept group is remarked on.
const drift = 1e-6

func (w *work) note(pointer, code, sentence string) {
	w.Notes = append(w.Notes, kind.Warning{Pointer: pointer, Code: code, Sentence: sentence})
}

// Property returns what a factor is the factor of in the prototype, where it is one
// quantity.
func (s *Scaling) Property(f Factor) (x float64, k units.Kind, known bool) {
	id, is := properties[f]
	switch {
	case f == Gravity:
		id = scale.Gravity
	case f == StaticPressure || !is:
		return 0, 0, false
	}
	v := s.Prototype.Scales.Value(id)
	return v.X, v.Kind, s.Prototype.Scales.Has(id)
}
