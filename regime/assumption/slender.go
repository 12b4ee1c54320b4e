package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// Slender: a beam without shear.
var Slender = &Entry{
	ID:        "slender",
	Title:     "Slender structure",
	LeavesOut: "shear and distortion of the section",
	Estimated: "scale: diameter over length against 0.1",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Timoshenko1974},
	Estimate:  estimateSlender,
}

var (
	slender    = finding.Say("The diameter is {slenderness} of the length; a beam is slender below 0.1.")
	notSlender = finding.Say("The structure is no beam.")
)

func estimateSlender(x *finding.Context) {
	if x.State(group.Slenderness) == group.Absent {
		x.NotApplicable(notSlender)
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.1, Factor: 1.5, Say: slender, Source: cite.Timoshenko1974},
		group.Slenderness, identity)
}
