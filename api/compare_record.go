package api

import (
	"regimed/api/render"
	"regimed/regime"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/kind"
	"regimed/regime/similar"
)

// ComparisonRecord is a comparison as it is sent.
type ComparisonRecord struct {
	Engine    EngineRecord        `json:"engine"`
	A         ComparedCase        `json:"a"`
	B         ComparedCase        `json:"b"`
	Tolerance float64             `json:"tolerance"`
	Kept      int                 `json:"kept"`
	Distorted int                 `json:"distorted"`
	Groups    []GroupPairRecord   `json:"groups"`
	OnlyA     []GroupAloneRecord  `json:"only_a"`
	OnlyB     []GroupAloneRecord  `json:"only_b"`
	Verdicts  []VerdictPairRecord `json:"verdicts"`
	Axes      []AxisPairRecord    `json:"axes"`
}

// EngineRecord says which engine and catalogue answered.
type EngineRecord struct {
	Version   string `json:"version"`
	Catalogue string `json:"catalogue"`
}

func engineRecord() EngineRecord { return EngineRecord{render.Version, render.Catalogue()} }

// ComparedCase is one of the two cases.
type ComparedCase struct {
	Title       string `json:"title"`
	Kind        string `json:"kind"`
	Digest      string `json:"digest"`
	Class       string `json:"class"`
	Provisional bool   `json:"provisional"`
}

// GroupPairRecord is a group that both cases have; the factor is b/a, null where
// only a is zero.
type GroupPairRecord struct {
	ID     string   `json:"id"`
	Symbol string   `json:"symbol"`
	Title  string   `json:"title"`
	A      *float64 `json:"a"`
	B      *float64 `json:"b"`
	Factor *float64 `json:"factor"`
	Kept   bool     `json:"kept"`
}

// GroupAloneRecord is a group that one case has, and why the other has not.
type GroupAloneRecord struct {
	ID     string   `json:"id"`
	Symbol string   `json:"symbol"`
	Title  string   `json:"title"`
	Value  *float64 `json:"value"`
	Other  string   `json:"other"`
	Needs  string   `json:"needs,omitzero"`
}

// VerdictPairRecord is an assumption that is judged differently.
type VerdictPairRecord struct {
	ID    string        `json:"id"`
	Title string        `json:"title"`
	A     VerdictRecord `json:"a"`
	B     VerdictRecord `json:"b"`
}

// VerdictRecord is a verdict with the utilisation of what governs it.
type VerdictRecord struct {
	Verdict     string   `json:"verdict"`
	Utilisation *float64 `json:"utilisation"`
}

// AxisPairRecord is an axis of the recommendation that differs.
type AxisPairRecord struct {
	ID string `json:"id"`
	A  string `json:"a"`
	B  string `json:"b"`
}

// NewComparisonRecord makes the record of a comparison.
func NewComparisonRecord(c *similar.Comparison) *ComparisonRecord {
	r := &ComparisonRecord{
		Engine: engineRecord(), A: comparedCase(c.A), B: comparedCase(c.B), Tolerance: c.Tolerance,
		Kept: len(c.Groups) - c.Distorted(), Distorted: c.Distorted(),
		Groups: []GroupPairRecord{}, Verdicts: []VerdictPairRecord{}, Axes: []AxisPairRecord{},
		OnlyA: aloneRecords(c.OnlyA, c.A.Groups, c.B.Groups), OnlyB: aloneRecords(c.OnlyB, c.B.Groups, c.A.Groups),
	}
	for i := range c.Groups {
		p := &c.Groups[i]
		d := group.Of(p.ID)
		r.Groups = append(r.Groups, GroupPairRecord{ID: d.ID, Symbol: d.Symbol, Title: d.Title, A: number(p.A), B: number(p.B), Factor: number(p.Factor), Kept: p.Kept})
	}
	for i := range c.Verdicts {
		v := &c.Verdicts[i]
		r.Verdicts = append(r.Verdicts, VerdictPairRecord{ID: v.Entry.ID, Title: v.Entry.Title, A: verdictRecord(v.A, v.UtilisationA), B: verdictRecord(v.B, v.UtilisationB)})
	}
	for _, x := range c.Axes {
		r.Axes = append(r.Axes, AxisPairRecord(x))
	}
	return r
}

func verdictRecord(v finding.Verdict, utilisation float64) VerdictRecord {
	return VerdictRecord{Verdict: v.String(), Utilisation: number(utilisation)}
}

func comparedCase(a *regime.Answer) ComparedCase {
	r := ComparedCase{Kind: a.Kind.Name, Digest: a.Case.Digest(), Class: a.Recommendation.Class.ID, Provisional: a.Recommendation.Provisional}
	if v := a.Case.Lookup(kind.Title); v != nil {
		r.Title = v.Text
	}
	return r
}

func aloneRecords(ids []group.ID, has, lacks *group.Set) []GroupAloneRecord {
	list := []GroupAloneRecord{}
	for _, id := range ids {
		d := group.Of(id)
		r := GroupAloneRecord{ID: d.ID, Symbol: d.Symbol, Title: d.Title, Value: number(has.Get(id)), Other: "does-not-arise"}
		switch lacks.State(id) {
		case group.Missing:
			r.Other, r.Needs = "missing", lacks.Need(id).Input
		case group.OffRange:
			r.Other = "off-range"
		}
		list = append(list, r)
	}
	return list
}
