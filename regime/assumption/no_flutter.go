package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoFlutter: no self-excited vibration in attached flow.
var NoFlutter = &Entry{
	ID:        "no-flutter",
	Title:     "No flutter",
	LeavesOut: "self-excited vibration by the phase between motion and flow force",
	Estimated: "highest speed of operation over the flutter speed: a section or wing as a thin aerofoil with plunge and pitch, a panel in supersonic flow by piston theory, a cantilever in axial flow by the slender-body equation",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Dowell1975, cite.Paidoussis2016, cite.TheodorsenGarrick1940},
	Hazard:    "Flutter destroys within seconds: certification and licensed practice set the margin.",
	Estimate: func(x *finding.Context) {
		source := cite.Dowell1975
		if x.Is(group.Internal) {
			source = cite.GregoryPaidoussis1966
		}
		if x.Is(group.PanelLike | group.Cantilever) {
			source = cite.Eloy2008
		}
		if x.Has(group.TorsionRatio) {
			source = cite.TheodorsenGarrick1940
		}
		hazardOfSpeed(x, group.FlutterSpeed, flutter, source, x.Factors.Flutter, noFlutterShape)
	},
}

var (
	flutter        = finding.Say("The highest speed of operation is {e} of the flutter speed.")
	noFlutterShape = finding.Say("This shape has no flutter in this flow, or another instability comes first.")
)
