package regime

import (
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/kind"
	"regimed/regime/ladder"
	"regimed/regime/scale"
	"regimed/regime/setup"
)

// Answer is the record of one case: everything that a rendering shows, and no
// word of prose.
type Answer struct {
	Case           *input.Case
	Kind           *kind.Kind
	Scales         *scale.Set
	Groups         *group.Set
	Findings       []finding.Finding // by the order of assumption.Catalogue
	Recommendation ladder.Recommendation
	Setup          []setup.Figure
	finding.Study
	Warnings []kind.Warning
	Modes    []Mode // where a case gives several

	// What package whatif adds; nil where it was not asked.
	Drivers [][]Driver // by finding, the three largest
	Turns   []Turn
	Spread  *Spread // where an input is uncertain

	judged *finding.Context // what Findings lies in
}
