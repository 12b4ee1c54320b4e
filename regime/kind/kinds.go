package kind

import (
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/input"
)

// All lists the kinds of structure. A new one is a file and a line here.
var All = []*Kind{
	Generic,
	Cylinder,
	Plate,
}

// Find returns the kind of that name, or nil.
func Find(name string) *Kind {
	for _, k := range All {
		if k.Name == name {
			return k
		}
	}
	return nil
}

// CriterionLockIn picks the criterion that decides on lock-in.
var CriterionLockIn = choice("lock_in", "criterion that decides on lock-in", "the physical model decides; the criteria stand beside it", criterion.Names("lock_in")...)

var criteriaBlock = &input.Block{Name: "criteria", Title: "Criteria", Doc: "criteria of standards that decide in place of the physical model",
	Fields: []*input.Field{CriterionLockIn}}

// PickedCriterion returns the criterion that a case picks, or nil.
func PickedCriterion(c *input.Case) *finding.Criterion {
	if v := c.Lookup(CriterionLockIn); v != nil {
		return criterion.Find(v.Text)
	}
	return nil
}

var schema = newSchema()

func newSchema() *input.Schema {
	top := &input.Block{Title: "Case", Doc: "a coupled fluid-structure case", Fields: []*input.Field{Title, Reference, InterestField}}
	var kinds []*input.Block
	for _, k := range All {
		kinds = append(kinds, &input.Block{Name: k.Name, Title: k.Title, Doc: k.Doc, Fields: k.Fields})
	}
	return input.NewSchema(top, kinds, []*input.Block{fluidBlock, flowBlock, motionBlock, surroundingsBlock, toleranceBlock, criteriaBlock, givenBlock})
}

// Schema is everything that a case may contain.
func Schema() *input.Schema { return schema }
