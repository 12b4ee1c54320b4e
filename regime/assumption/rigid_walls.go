package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// RigidWalls: the walls of a tank do not move under the liquid.
var RigidWalls = &Entry{
	ID:        "rigid-walls",
	Title:     "Rigid walls",
	LeavesOut: "motion of the walls under the liquid",
	Estimated: "frequency: ½(f_s/f_b)², the first sloshing frequency over that of the wall with liquid: two springs in series",
	Measures:  []finding.Measure{finding.Frequency},
	Sources:   []*cite.Source{cite.Abramson1966, cite.ThisMethod},
	Estimate:  estimateRigidWalls,
}

var (
	wallsMove = finding.Say("Walls that are taken as rigid shift the sloshing frequency by {e:%}: it is {bulging_ratio} of the frequency of the wall with liquid.")
	noTank    = finding.Say("There is no liquid that sloshes in a tank.")
)

func estimateRigidWalls(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Is(group.Sloshing):
		x.NotApplicable(noTank)
	default:
		addMovingWalls(x)
	}
}

// addMovingWalls adds what walls that give way do to the liquid: two springs in
// series.
func addMovingWalls(x *finding.Context) {
	if x.Is(group.StaticOnly) && !x.Has(group.BulgingRatio) {
		x.NotApplicable(noFrequency)
		return
	}
	x.AddOrWait(finding.Part{Measure: finding.Frequency, Basis: finding.Canonical, Factor: 2, Say: wallsMove, Source: cite.Abramson1966},
		group.BulgingRatio, func(r float64) float64 { return r * r / 2 })
}
