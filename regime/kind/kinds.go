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
	Section,
	Wing,
	TubeArray,
	Flag,
	Pipe,
	Vessel,
	Tank,
	Floater,
	Piston,
	Film,
	Microbeam,
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

// CriterionFluidelastic picks the criterion that decides on fluidelastic instability.
var CriterionFluidelastic = choice("fluidelastic", "criterion that decides on fluidelastic instability of a tube array", "K = 3.0; the criteria stand beside it", criterion.Names("fluidelastic")...)

// CriterionGalloping picks the criterion that decides on galloping.
var CriterionGalloping = choice("galloping", "criterion that decides on galloping", "the physical model decides; the criteria stand beside it", criterion.Names("galloping")...)

// CriterionDivergence picks the criterion that decides on divergence.
var CriterionDivergence = choice("divergence", "criterion that decides on torsional divergence", "the physical model decides; the criteria stand beside it", criterion.Names("divergence")...)

// CriterionSurge picks the criterion that decides on pressure surge.
var CriterionSurge = choice("pressure_surge", "criterion that decides on a pressure surge", "the physical model decides; the criteria stand beside it", criterion.Names("pressure_surge")...)

var criteriaBlock = &input.Block{Name: "criteria", Title: "Criteria", Doc: "criteria of standards that decide in place of the physical model",
	Fields: []*input.Field{CriterionLockIn, CriterionFluidelastic, CriterionGalloping, CriterionDivergence, CriterionSurge}}

// PickedCriteria returns the criteria that a case picks.
func PickedCriteria(c *input.Case) finding.Picks {
	var p finding.Picks
	for i, f := range criteriaBlock.Fields {
		if v := c.Lookup(f); v != nil {
			p[i] = criterion.Find(v.Text)
		}
	}
	return p
}

var schema = newSchema()

func newSchema() *input.Schema {
	top := &input.Block{Title: "Case", Doc: "a coupled fluid-structure case", Fields: []*input.Field{Title, Reference, InterestField}}
	var kinds []*input.Block
	for _, k := range All {
		kinds = append(kinds, &input.Block{Name: k.Name, Title: k.Title, Doc: k.Doc, Fields: k.Fields})
	}
	return input.NewSchema(top, kinds, []*input.Block{fluidBlock, flowBlock, wavesBlock, motionBlock, surroundingsBlock, toleranceBlock, criteriaBlock, givenBlock, activeBlock})
}

// Schema is everything that a case may contain.
func Schema() *input.Schema { return schema }
