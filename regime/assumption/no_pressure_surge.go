package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoPressureSurge: no change of the flow sends a pressure wave that counts.
var NoPressureSurge = &Entry{
	ID:        "no-pressure-surge",
	Title:     "No pressure surge",
	LeavesOut: "pressure waves that a change of the flow sends through the column",
	Estimated: "stability: Δp/(0.1 p), Δp = ρaΔU min(1, (2ℓ/a)/t_c), p the gauge pressure inside; where the sudden change is harmless, no closure time is needed",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Joukowsky1898, cite.ASMEB314},
	Hazard:    "A pressure surge can burst or collapse a pipe at once: the pipeline code in force and a transient analysis decide.",
	Estimate:  estimatePressureSurge,
}

// surgeAllowance is the share of the pressure by which pipeline codes let a
// surge exceed it (ASME B31.4, from memory).
const surgeAllowance = 0.1

var (
	surge         = finding.Say("Stopping the flow in {surge_ratio} of the return time of the wave raises the pressure by {e} of the gauge pressure; pipeline codes allow 0.1.")
	surgeSudden   = finding.Say("Even a sudden change of the flow raises the pressure by {e} of the gauge pressure; pipeline codes allow 0.1.")
	surgeNoColumn = finding.Say("No column of fluid in a tube is stopped or started.")
	surgeNoChange = finding.Say("The flow inside does not change.")
)

func estimatePressureSurge(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.Column):
		x.NotApplicable(surgeNoColumn)
		return
	case x.State(group.SurgePressure) == group.Absent:
		x.NotApplicable(surgeNoChange)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Limit: surgeAllowance, Factor: 1.5, Say: surge, Source: cite.ASMEB314}
	addSurge(x, p, group.SurgePressure, group.SurgeSudden, surgeSudden)
	x.Publish(criterion.All, "no-pressure-surge")
}

// addSurge adds the surge, or that of a sudden change where the time of the
// change is not known and would not matter.
func addSurge(x *finding.Context, p finding.Part, slow, sudden group.ID, say *finding.Sentence) {
	if !x.Has(slow) && x.Has(sudden) && x.Get(sudden)*p.Factor <= limitOf(x, p) {
		p.Estimate, p.Say = x.Get(sudden), say
		x.Add(p)
		return
	}
	x.AddOrWait(p, slow, identity)
}

func limitOf(x *finding.Context, p finding.Part) float64 {
	if p.Limit > 0 {
		return p.Limit
	}
	return x.Tolerance.Limit(p.Measure)
}
