package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoDivergence: the flow does not overcome the stiffness.
var NoDivergence = &Entry{
	ID:        "no-divergence",
	Title:     "No static divergence",
	LeavesOut: "flow-induced stiffness that cancels that of the structure",
	Estimated: "highest speed of operation over the divergence speed; a section: q = K_α/(B² C_Mα), a wing: q = K_α √(1 − M²)/(e c² C_Lα) with its sweep; a flush panel in subsonic flow: q = D k_b³/2 wetted on one side, half of it on two",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Dowell1975, cite.BisplinghoffAshleyHalfman1955},
	Hazard:    "Divergence is sudden and destroys: the code in force and a margin set by licensed practice decide.",
	Estimate: func(x *finding.Context) {
		source := cite.BisplinghoffAshleyHalfman1955
		if x.Is(group.PanelLike) {
			source = cite.Dowell1975
		}
		if x.Is(group.PanelLike | group.Cantilever) {
			source = cite.Sader2016
		}
		hazardOfSpeed(x, group.DivergenceSpeed, divergence, source, x.Factors.Buckling, noDivergenceShape)
		x.Publish(criterion.All, "no-divergence")
	},
}

var (
	divergence        = finding.Say("The highest speed of operation is {e} of the divergence speed.")
	noDivergenceShape = finding.Say("The mean flow makes no force that grows with the displacement of this shape.")
)

// hazardOfSpeed estimates a hazard by the ratio of the highest speed of
// operation to a critical speed.
func hazardOfSpeed(x *finding.Context, id group.ID, say *finding.Sentence, source *cite.Source, factor float64, never *finding.Sentence) {
	switch {
	case !flows(x, group.Flow): // said why
	case x.State(id) == group.Absent || x.State(id) == group.OffRange:
		x.NotApplicable(never)
	case x.Is(group.StaticOnly) && !x.Has(id):
		x.NotApplicable(noFrequency)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: factor,
			Say: say, Source: source}, id, identity)
	}
}
