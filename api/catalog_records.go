package api

import (
	"regimed/regime/assumption"
	"regimed/regime/canon"
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/fluid"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/solid"
	"regimed/units"
)

// FieldRecord describes a field of a case.
type FieldRecord struct {
	Name     string   `json:"name"`
	Pointer  string   `json:"pointer"`
	Type     string   `json:"type"`
	Quantity string   `json:"quantity,omitempty"` // of a quantity: what it measures
	Unit     string   `json:"unit,omitempty"`     // of a quantity: its SI unit
	Needed   bool     `json:"needed"`
	Default  string   `json:"default,omitempty"` // what is assumed where it is not given, in words
	Rule     string   `json:"rule,omitempty"`    // in words: "greater than 0 m"
	Options  []string `json:"options,omitempty"`
	Doc      string   `json:"doc"`
}

// typeNames are the types of fields in words.
var typeNames = [...]string{
	input.Quantity: "quantity", input.Number: "number", input.Integer: "integer", input.Flag: "flag",
	input.Text: "text", input.Choice: "choice", input.Choices: "choices", input.Interval: "interval", input.Rows: "list",
}

func fieldRecord(f *input.Field) FieldRecord {
	r := FieldRecord{Name: f.Name, Pointer: f.Pointer(), Type: typeNames[f.Type], Needed: f.Needed,
		Default: f.Default, Options: f.Options, Doc: f.Doc}
	if f.Rule != "" {
		r.Rule = input.RuleText(f)
	}
	if f.Type == input.Text && f.Rule != "" {
		r.Rule += " characters"
	}
	if f.Type == input.Quantity || f.Type == input.Interval {
		r.Quantity, r.Unit = f.Kind.String(), f.Kind.SI()
	}
	return r
}

// KindRecord describes a structure kind.
type KindRecord struct {
	Name       string        `json:"name"`
	Title      string        `json:"title"`
	Doc        string        `json:"doc"`
	Directions []string      `json:"directions"` // how a flow may run; the first is assumed
	Fields     []FieldRecord `json:"fields"`
}

func kindRecord(k *kind.Kind) KindRecord {
	return KindRecord{Name: k.Name, Title: k.Title, Doc: k.Doc, Directions: list(k.Directions), Fields: records(k.Fields, fieldRecord)}
}

// GroupRecord describes a dimensionless group.
type GroupRecord struct {
	ID         string       `json:"id"`
	Symbol     string       `json:"symbol"`
	Title      string       `json:"title"`
	Definition string       `json:"definition"`
	Core       bool         `json:"core"` // every answer has it, as a value or with the reason why not
	Bands      []BandRecord `json:"bands"`
}

// BandRecord names a range of a group, up to a value; null is without end.
type BandRecord struct {
	Below *float64 `json:"below"`
	Name  string   `json:"name"`
}

// endless is from where on a bound of a record stands for none.
const endless = 1e300

func bound(x float64) *float64 {
	if x >= endless || x <= -endless {
		return nil
	}
	return number(x)
}

func groupRecord(d *group.Def) GroupRecord {
	return GroupRecord{ID: d.ID, Symbol: d.Symbol, Title: d.Title, Definition: d.Definition, Core: d.Core,
		Bands: records(d.Bands, func(b group.Band) BandRecord { return BandRecord{bound(b.Below), b.Name} })}
}

// AssumptionRecord describes an assumption.
type AssumptionRecord struct {
	ID        string   `json:"id"`
	Title     string   `json:"title"`
	LeavesOut string   `json:"leaves_out"`
	Estimated string   `json:"estimated"`
	Measures  []string `json:"measures"`
	Hazard    bool     `json:"hazard"`
	Caution   string   `json:"caution,omitempty"` // of a hazard: what an answer says while it is active
	Sources   []string `json:"sources"`           // ids of the catalogue of sources
}

func assumptionRecord(e *assumption.Entry) AssumptionRecord {
	return AssumptionRecord{ID: e.ID, Title: e.Title, LeavesOut: e.LeavesOut, Estimated: e.Estimated,
		Measures: records(e.Measures, finding.Measure.String), Hazard: e.Hazard != "", Caution: e.Hazard, Sources: records(e.Sources, sourceID)}
}

func sourceID(s *cite.Source) string { return s.ID }

// ClassRecord describes a model class.
type ClassRecord struct {
	ID      string         `json:"id"`
	Title   string         `json:"title"`
	Rank    int            `json:"rank"` // of cost
	Solves  string         `json:"solves"`
	Domain  DomainRecord   `json:"domain"`
	RestsOn []string       `json:"rests_on"` // ids of assumptions
	Axes    OrderedMembers `json:"axes"`     // null: set by the findings of the case
}

// DomainRecord says where a class can be asked at all.
type DomainRecord struct {
	Kinds        []string `json:"kinds"`         // empty: every kind
	States       []string `json:"states"`        // states of the fluid that it covers
	WithoutFluid bool     `json:"without_fluid"` // also where there is no fluid
	Needs        []string `json:"needs"`         // traits that must hold
	Bars         []string `json:"bars"`          // traits of which none may hold
}

func classRecord(c *ladder.Class) ClassRecord {
	r := ClassRecord{ID: c.ID, Title: c.Title, Rank: c.Rank, Solves: c.Solves,
		RestsOn: records(c.RestsOn, func(e *assumption.Entry) string { return e.ID }),
		Domain: DomainRecord{Kinds: list(c.Domain.Kinds), States: traitNames(c.Domain.States), WithoutFluid: c.Domain.Dry,
			Needs: traitNames(c.Domain.Needs), Bars: traitNames(c.Domain.Bars)}}
	for i := range ladder.AxisList {
		axis := &ladder.AxisList[i]
		var value any
		if s := *axis.Of(&c.Axes); s != "" {
			value = s
		}
		r.Axes = r.Axes.with(axis.ID, value)
	}
	return r
}

func traitNames(t group.Traits) []string {
	names := []string{}
	for _, x := range group.TraitNames {
		if t.Any(x.Trait) {
			names = append(names, x.Name)
		}
	}
	return names
}

// CriterionRecord describes a criterion of a standard.
type CriterionRecord struct {
	ID         string `json:"id"`
	Assumption string `json:"assumption"`      // id of the assumption that it screens
	Field      string `json:"field,omitempty"` // under criteria in a case, to let it decide
	Standard   string `json:"standard"`
	Edition    string `json:"edition"`
	Clause     string `json:"clause"`
	Formula    string `json:"formula"`
	Source     string `json:"source"` // id of the catalogue of sources
}

func criterionRecord(c *finding.Criterion) CriterionRecord {
	return CriterionRecord{ID: c.ID, Assumption: c.Assumption, Field: c.Field, Standard: c.Standard, Edition: c.Edition,
		Clause: c.Clause, Formula: c.Formula, Source: c.Source.ID}
}

// QuantityRecord is a number with its unit; null where it is not known.
type QuantityRecord struct {
	Value *float64 `json:"value"`
	Unit  string   `json:"unit"`
}

// RangeRecord is a range with its unit.
type RangeRecord struct {
	Min  *float64 `json:"min"`
	Max  *float64 `json:"max"`
	Unit string   `json:"unit"`
}

// FluidRecord describes a fluid.
type FluidRecord struct {
	Name     string          `json:"name"`
	Title    string          `json:"title"`
	Phase    string          `json:"phase"`
	Typical  bool            `json:"typical"` // typical values, no measured or standardised formulation
	Ranges   FluidRanges     `json:"ranges"`
	Defaults FluidDefaults   `json:"defaults"`
	Uses     []string        `json:"uses"` // inputs that change the values
	At       FluidProperties `json:"at_defaults"`
	Sources  []string        `json:"sources"`
	Note     string          `json:"note"`
}

// FluidRanges are what a model covers; pressure may be narrower at a given
// temperature.
type FluidRanges struct {
	Temperature RangeRecord `json:"temperature"`
	Pressure    RangeRecord `json:"pressure"`
	Salinity    RangeRecord `json:"salinity"`
}

// FluidDefaults are the state that is assumed.
type FluidDefaults struct {
	Temperature QuantityRecord `json:"temperature"`
	Pressure    QuantityRecord `json:"pressure"`
	Salinity    QuantityRecord `json:"salinity"`
}

// FluidProperties are the properties at one state; null where the model gives none.
type FluidProperties struct {
	Density           QuantityRecord `json:"density"`
	Viscosity         QuantityRecord `json:"viscosity"`
	SoundSpeed        QuantityRecord `json:"sound_speed"`
	VapourPressure    QuantityRecord `json:"vapour_pressure"`
	SurfaceTension    QuantityRecord `json:"surface_tension"`
	HeatCapacityRatio QuantityRecord `json:"heat_capacity_ratio"`
	PrandtlNumber     QuantityRecord `json:"prandtl_number"`
}

func fluidRecord(m *fluid.Model) FluidRecord {
	d := m.Default
	return FluidRecord{Name: m.Name, Title: m.Title, Phase: m.Phase.String(), Typical: m.Typical,
		Ranges: FluidRanges{fluidRange(m.Range.Temperature, fluid.Temperature), fluidRange(m.Range.Pressure, fluid.Pressure), fluidRange(m.Range.Salinity, fluid.Salinity)},
		Defaults: FluidDefaults{QuantityRecord{number(d.Temperature), fluid.Temperature.Unit()}, QuantityRecord{number(d.Pressure), fluid.Pressure.Unit()},
			QuantityRecord{number(d.Salinity), fluid.Salinity.Unit()}},
		Uses: fluidInputs(m), At: fluidProperties(m), Sources: records(m.Sources, sourceID), Note: m.Note}
}

func fluidRange(i fluid.Interval, in fluid.Input) RangeRecord {
	return RangeRecord{bound(i.Min), bound(i.Max), in.Unit()}
}

func fluidInputs(m *fluid.Model) []string {
	uses := []string{}
	for _, u := range []struct {
		uses bool
		in   fluid.Input
	}{{m.UsesTemperature, fluid.Temperature}, {m.UsesPressure, fluid.Pressure}, {m.UsesSalinity, fluid.Salinity}} {
		if u.uses {
			uses = append(uses, string(u.in))
		}
	}
	return uses
}

func fluidProperties(m *fluid.Model) FluidProperties {
	p, err := m.At(m.Default)
	if err != nil {
		return FluidProperties{} // the catalogue's own tests keep defaults in range
	}
	q := func(x float64, k units.Kind) QuantityRecord { return QuantityRecord{number(x), k.SI()} }
	return FluidProperties{
		Density: q(p.Density, units.Density), Viscosity: q(p.Viscosity, units.DynamicViscosity), SoundSpeed: q(p.SoundSpeed, units.Speed),
		VapourPressure: q(p.VapourPressure, units.Pressure), SurfaceTension: q(p.SurfaceTension, units.SurfaceTension),
		HeatCapacityRatio: q(p.HeatCapacityRatio, units.Dimensionless), PrandtlNumber: q(p.Prandtl, units.Dimensionless),
	}
}

// SolidRecord describes a solid.
type SolidRecord struct {
	Name         string         `json:"name"`
	Title        string         `json:"title"`
	Typical      bool           `json:"typical"`
	Density      QuantityRecord `json:"density"`
	YoungModulus QuantityRecord `json:"young_modulus"`
	PoissonRatio QuantityRecord `json:"poisson_ratio"`
	LinearStrain QuantityRecord `json:"linear_strain"`
	Sources      []string       `json:"sources"`
	Note         string         `json:"note"`
}

func solidRecord(m *solid.Material) SolidRecord {
	q := func(x float64, k units.Kind) QuantityRecord { return QuantityRecord{number(x), k.SI()} }
	return SolidRecord{Name: m.Name, Title: m.Title, Typical: m.Typical,
		Density: q(m.Density, units.Density), YoungModulus: q(m.Young, units.Modulus), PoissonRatio: q(m.Poisson, units.Dimensionless),
		LinearStrain: q(m.LinearStrain, units.Dimensionless), Sources: records(m.Sources, sourceID), Note: m.Note}
}

// UnitRecord describes a unit: x of it is (x + offset)·factor of the SI unit.
type UnitRecord struct {
	Symbol     string   `json:"symbol"`
	Aliases    []string `json:"aliases"`
	Name       string   `json:"name"`
	SI         string   `json:"si"`
	Factor     float64  `json:"factor"`
	Offset     float64  `json:"offset"`
	Prefixable bool     `json:"prefixable"` // takes SI prefixes
	Source     string   `json:"source"`
}

func unitRecord(u units.UnitInfo) UnitRecord {
	return UnitRecord{Symbol: u.Symbol, Aliases: list(u.Aliases), Name: u.Name, SI: u.SI, Factor: u.Factor, Offset: u.Offset,
		Prefixable: u.Prefixable, Source: u.Source}
}

// CanonRecord describes a canonical solution.
type CanonRecord struct {
	Name      string           `json:"name"`
	Problem   string           `json:"problem"`
	Equation  string           `json:"equation"`
	Arguments []ArgumentRecord `json:"arguments"`
	Outputs   []OutputRecord   `json:"outputs"`
	Accuracy  *float64         `json:"accuracy"` // relative, over the stated range
	Factor    *float64         `json:"factor"`   // model-form factor where used for this very geometry
	Sources   []string         `json:"sources"`
	Note      string           `json:"note,omitempty"`
	Path      string           `json:"path"` // where it is evaluated
}

// ArgumentRecord describes an argument: a pure number, or a choice by name.
type ArgumentRecord struct {
	Name     string   `json:"name"`
	Symbol   string   `json:"symbol"`
	Doc      string   `json:"doc"`
	Min      *float64 `json:"min,omitzero"`
	Max      *float64 `json:"max,omitzero"`
	Choices  []string `json:"choices,omitempty"`
	Optional bool     `json:"optional"`
	Default  any      `json:"default,omitempty"`
}

// OutputRecord describes a result.
type OutputRecord struct {
	ID     string `json:"id"`
	Symbol string `json:"symbol"`
	Doc    string `json:"doc"`
}

func canonRecord(e *canon.Entry) CanonRecord {
	return CanonRecord{Name: e.Name, Problem: e.Problem, Equation: e.Equation, Arguments: records(e.Args, argumentRecord),
		Outputs:  records(e.Outputs, func(o canon.Output) OutputRecord { return OutputRecord{o.ID, o.Symbol, o.Doc} }),
		Accuracy: number(e.Accuracy), Factor: number(e.Factor), Sources: records(e.Sources, sourceID), Note: e.Note, Path: "/v1/canon/" + e.Name}
}

func argumentRecord(a canon.Arg) ArgumentRecord {
	r := ArgumentRecord{Name: a.Name, Symbol: a.Symbol, Doc: a.Doc, Choices: a.Choices, Optional: a.Optional}
	if len(a.Choices) == 0 {
		r.Min, r.Max = bound(a.Min), bound(a.Max)
		if a.Optional {
			r.Default = number(a.Default)
		}
		return r
	}
	if i := int(a.Default); a.Optional && i >= 0 && i < len(a.Choices) {
		r.Default = a.Choices[i]
	}
	return r
}

// list keeps an empty list from becoming null.
func list(s []string) []string {
	if s == nil {
		return []string{}
	}
	return s
}
