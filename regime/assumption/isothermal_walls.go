package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// IsothermalWalls: thermal layers at the walls of a gap may be left out.
var IsothermalWalls = &Entry{
	ID:        "isothermal-walls",
	Title:     "No thermal layers in the gap",
	LeavesOut: "thermal boundary layers of a gas in a narrow gap",
	Estimated: "response: (γ − 1) δ_t/gap, δ_t = δ/√Pr, taken as the share of the compressive energy that the walls take up",
	Measures:  []finding.Measure{finding.Response},
	Sources:   []*cite.Source{cite.KinslerFrey2000},
	Estimate:  estimateIsothermalWalls,
}

var (
	thermalWalls = finding.Say("The thermal layers at the walls take {e:%} of the energy of compression: (γ − 1) δ_t/gap = {thermal_layer}.")
	liquidWalls  = finding.Say("The fluid is a liquid: its compression hardly heats it.")
)

func estimateIsothermalWalls(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case x.Is(group.Liquid):
		x.NotApplicable(liquidWalls)
	case x.State(group.ThermalLayer) == group.Absent:
		x.NotApplicable(noGap)
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: 2, Say: thermalWalls, Source: cite.KinslerFrey2000},
			group.ThermalLayer, func(v float64) float64 { return v / (1 + v) })
	}
}
