package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoPullIn: a dielectric elastomer does not pull itself in. No class rests on
// it: it is the membrane's own affair, whatever the fluid.
var NoPullIn = &Entry{
	ID:        "no-pull-in",
	Title:     "No pull-in of a dielectric elastomer",
	LeavesOut: "the instability by which a membrane under voltage thins, so that the field grows and thins it further",
	Estimated: "field over that of pull-in, √(εE²/(0.4725 μ)), of a membrane stretched by the voltage alone",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.ZhaoSuo2007},
	Hazard:    "Pull-in ends in electrical breakdown at high voltage: the safety rules for high voltage apply.",
	Estimate:  estimatePullIn,
}

var (
	pullIn      = finding.Say("The field is {e} of that at which the membrane pulls itself in.")
	noElastomer = finding.Say("The structure has no membrane of dielectric elastomer.")
)

func estimatePullIn(x *finding.Context) {
	if !x.Is(group.Dielectric) {
		x.NotApplicable(noElastomer)
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: 1.5, Say: pullIn, Source: cite.ZhaoSuo2007}, group.PullIn, identity)
}
