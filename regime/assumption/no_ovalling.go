package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoOvalling: a thin shell keeps its round section.
var NoOvalling = &Entry{
	ID:        "no-ovalling",
	Title:     "No ovalling of a thin shell",
	LeavesOut: "vibration of the section of a thin shell in cross flow",
	Estimated: "highest speed of operation over f_n D/(2 St), f_n the lowest mode of the shell with n ≥ 2 waves around",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.ASMESTS1, cite.PaidoussisPriceSuen1982},
	Hazard:    "Ovalling cracks a thin stack at its base and its openings: stiffening rings or a lining raise the frequency of the section.",
	Estimate: func(x *finding.Context) {
		hazardOfSpeed(x, group.OvallingSpeed, ovalling, cite.ASMESTS1, 1.5, noOvallingShape)
	},
}

var (
	ovalling        = finding.Say("The highest speed of operation is {e} of that at which the section ovals with {ovalling_mode} waves around.")
	noOvallingShape = finding.Say("The section is no thin and empty shell across a flow of gas.")
)
