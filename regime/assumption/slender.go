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
	slender      = finding.Say("The diameter is {slenderness} of the length; a beam is slender below 0.1.")
	slenderStrip = finding.Say("The width is {slenderness} of the length; the flow around a strip is that around a slender body below 0.3.")
	notSlender   = finding.Say("The structure is no beam.")
)

func estimateSlender(x *finding.Context) {
	if x.State(group.Slenderness) == group.Absent {
		x.NotApplicable(notSlender)
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.1, Factor: 1.5, Say: slender, Source: cite.Timoshenko1974}
	if x.Is(group.PanelLike) {
		// a thin strip has no shear to speak of: what counts is that the flow
		// around it is that around a slender body
		p.Limit, p.Say, p.Source = 0.3, slenderStrip, cite.Eloy2007
	}
	x.AddOrWait(p, group.Slenderness, identity)
}
