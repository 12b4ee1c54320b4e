package api

import (
	"github.com/go-json-experiment/json/jsontext"

	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/similar"
)

// ScalingRecord is a scaling as it is sent.
type ScalingRecord struct {
	Engine      EngineRecord           `json:"engine"`
	Consistent  bool                   `json:"consistent"` // every group that was to be kept can be
	Factors     []FactorRecord         `json:"factors"`
	Quantities  []ScaledQuantityRecord `json:"quantities"`
	Keep        []KeepRecord           `json:"keep"`
	Exclusions  []ExclusionRecord      `json:"exclusions"`
	Assumptions []RuleRecord           `json:"assumptions"`
	Fields      []ScaledFieldRecord    `json:"fields"`
	Case        jsontext.Value         `json:"case"`
	Violations  []ViolationItem        `json:"violations"`
	Comparison  *ComparisonRecord      `json:"comparison"`
	Notes       []NoteRecord           `json:"notes"`
}

// FactorRecord is an independent scale factor.
type FactorRecord struct {
	ID        string         `json:"id"`
	Symbol    string         `json:"symbol"`
	Title     string         `json:"title"`
	Value     *float64       `json:"value"`
	Formula   string         `json:"formula"`
	Exponents OrderedMembers `json:"exponents"`
	Origin    string         `json:"origin"`
	Rule      string         `json:"rule,omitzero"`
}

// ScaledQuantityRecord is the factor of a quantity.
type ScaledQuantityRecord struct {
	ID        string         `json:"id"`
	Title     string         `json:"title"`
	Value     *float64       `json:"value"`
	Formula   string         `json:"formula"`
	Exponents OrderedMembers `json:"exponents"`
	RestsOn   []string       `json:"rests_on"`
}

// KeepRecord is a group that was to be kept.
type KeepRecord struct {
	ID     string   `json:"id"`
	Symbol string   `json:"symbol"`
	Title  string   `json:"title"`
	Held   bool     `json:"held"`
	Factor *float64 `json:"factor"`
	Judged *float64 `json:"judged"`
}

// ExclusionRecord is a smallest set of groups that exclude each other.
type ExclusionRecord struct {
	LetGo    string            `json:"let_go"`
	Groups   []DeviationRecord `json:"groups"`
	Remedies []RemedyRecord    `json:"remedies"`
}

// DeviationRecord is by how much a group of such a set would be distorted if the
// others were kept.
type DeviationRecord struct {
	ID      string   `json:"id"`
	Factor  *float64 `json:"factor"`
	Formula string   `json:"formula"`
}

// RemedyRecord is what a factor would have to be for the set to be kept.
type RemedyRecord struct {
	Factor  string   `json:"factor"`
	Now     *float64 `json:"now"`
	Needed  *float64 `json:"needed"`
	Formula string   `json:"formula"`
	Change  *float64 `json:"change"`
}

// RuleRecord is an assumption, with the factors that rest on it.
type RuleRecord struct {
	ID       string   `json:"id"`
	Sentence string   `json:"sentence"`
	Factors  []string `json:"factors"`
}

// ScaledFieldRecord is a quantity of the case with that of the model.
type ScaledFieldRecord struct {
	Pointer   string   `json:"pointer"`
	Quantity  string   `json:"quantity"`
	Unit      string   `json:"unit"`
	Prototype *float64 `json:"prototype"`
	Model     *float64 `json:"model"`
	Factor    *float64 `json:"factor"`
}

// NoteRecord is something that a reader of a scaling should know.
type NoteRecord struct {
	Pointer  string `json:"pointer"`
	Code     string `json:"code"`
	Sentence string `json:"sentence"`
}

// NewScalingRecord makes the record of a scaling.
func NewScalingRecord(s *similar.Scaling) *ScalingRecord {
	r := &ScalingRecord{
		Engine: engineRecord(), Consistent: len(s.Exclusions) == 0,
		Keep: []KeepRecord{}, Exclusions: []ExclusionRecord{}, Assumptions: []RuleRecord{}, Fields: []ScaledFieldRecord{},
		Case: similar.AppendCase(nil, s.Model.Case), Violations: []ViolationItem{}, Notes: noteRecords(s.Notes),
	}
	for i := range s.Factors {
		r.Factors = append(r.Factors, factorRecord(&s.Factors[i]))
	}
	for i := range s.Quantities {
		r.Quantities = append(r.Quantities, scaledQuantity(&s.Quantities[i]))
	}
	for i := range s.Groups {
		k := &s.Groups[i]
		d := group.Of(k.Group)
		r.Keep = append(r.Keep, KeepRecord{ID: d.ID, Symbol: d.Symbol, Title: d.Title, Held: k.Held, Factor: number(k.Factor), Judged: number(k.Judged)})
	}
	for i := range s.Exclusions {
		r.Exclusions = append(r.Exclusions, exclusionRecord(&s.Exclusions[i]))
	}
	for _, rule := range s.Rules {
		r.Assumptions = append(r.Assumptions, RuleRecord{ID: rule.ID, Sentence: rule.Sentence, Factors: restingOn(s, rule)})
	}
	for i := range s.Model.Fields {
		r.Fields = append(r.Fields, scaledField(&s.Model.Fields[i]))
	}
	for _, v := range s.Model.Violations {
		r.Violations = append(r.Violations, violationItem(v))
	}
	if s.Comparison != nil {
		r.Comparison = NewComparisonRecord(s.Comparison)
	}
	return r
}

func violationItem(v input.Violation) ViolationItem {
	return ViolationItem{Pointer: v.Pointer, Code: v.Code, Detail: v.Sentence, Value: received(v.Value)}
}

func noteRecords(notes []kind.Warning) []NoteRecord {
	list := []NoteRecord{}
	for _, n := range notes {
		list = append(list, NoteRecord(n))
	}
	return list
}

func factorRecord(f *similar.Solved) FactorRecord {
	d := similar.FactorOf(f.Factor)
	r := FactorRecord{ID: d.ID, Symbol: d.Symbol, Title: d.Title, Value: number(f.Value), Formula: f.Powers.Formula(), Exponents: exponents(f.Powers), Origin: f.Origin.String()}
	if f.Rule != nil {
		r.Rule = f.Rule.ID
	}
	return r
}

// exponents lists the exponents that are not zero.
func exponents(p similar.Powers) OrderedMembers {
	list := OrderedMembers{}
	for f := range similar.FactorCount {
		if e := p.Exponent(f); e != "0" {
			list = list.with(similar.FactorOf(f).ID, e)
		}
	}
	return list
}

func scaledQuantity(q *similar.Quantity) ScaledQuantityRecord {
	r := ScaledQuantityRecord{ID: q.ID, Title: q.Title, Value: number(q.Value), Formula: q.Powers.Formula(), Exponents: exponents(q.Powers), RestsOn: []string{}}
	for _, f := range q.Rests {
		r.RestsOn = append(r.RestsOn, similar.FactorOf(f).ID)
	}
	return r
}

func exclusionRecord(x *similar.Exclusion) ExclusionRecord {
	r := ExclusionRecord{LetGo: group.Of(x.Group).ID, Remedies: []RemedyRecord{}}
	for _, d := range x.Groups {
		r.Groups = append(r.Groups, DeviationRecord{ID: group.Of(d.Group).ID, Factor: number(d.Factor), Formula: d.Powers.Formula()})
	}
	for _, m := range x.Remedies {
		r.Remedies = append(r.Remedies, RemedyRecord{Factor: similar.FactorOf(m.Factor).ID, Now: number(m.Now), Needed: number(m.Needed), Formula: m.Powers.Formula(), Change: number(m.Change)})
	}
	return r
}

// restingOn lists the factors that a rule settled.
func restingOn(s *similar.Scaling, rule *similar.Rule) []string {
	list := []string{}
	for i := range s.Factors {
		if s.Factors[i].Rule == rule {
			list = append(list, similar.FactorOf(s.Factors[i].Factor).ID)
		}
	}
	return list
}

func scaledField(f *similar.ScaledField) ScaledFieldRecord {
	return ScaledFieldRecord{Pointer: f.Place.Pointer(), Quantity: f.Quantity, Unit: f.Kind.SI(), Prototype: number(f.Prototype), Model: number(f.Model), Factor: number(f.Model / f.Prototype)}
}
