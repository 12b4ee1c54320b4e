package criterion

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// The criteria of wind engineering for sections.
var (
	enGalloping = &finding.Criterion{
		ID: "en-1991-1-4-e2", Assumption: "no-galloping", Field: "galloping",
		Standard: "EN 1991-1-4", Edition: "2005, from memory", Clause: "E.2.2(3)",
		Formula: "v_CG = 2 Sc n b/a_G > 1.25 v_m, v_m the highest mean speed of operation",
		Source:  cite.EN1991Galloping,
		Applies: func(x *finding.Context) bool { return x.Is(group.Gas | group.Bluff) },
		Estimate: func(x *finding.Context) (float64, bool) {
			return 1.25 * x.Get(group.GallopingSpeed), x.Has(group.GallopingSpeed)
		},
		Say: finding.Say("By EN 1991-1-4 E.2.2 the highest speed of operation stands at {u} of the onset speed of galloping over 1.25."),
	}
	enDivergence = &finding.Criterion{
		ID: "en-1991-1-4-e4", Assumption: "no-divergence", Field: "divergence",
		Standard: "EN 1991-1-4", Edition: "2005, from memory", Clause: "E.4.2 and E.4.3",
		Formula:  "excluded by any of: d/b > 0.25, d the thickness and b the length along the wind; torsion at more than twice the frequency of bending; v_div > 2 v_m",
		Source:   cite.EN1991Divergence,
		Applies:  func(x *finding.Context) bool { return x.Is(group.Gas | group.Cross) },
		Estimate: divergence,
		Say:      finding.Say("By EN 1991-1-4 E.4 divergence stands at {u} of what would exclude it."),
	}
)

// divergence is the least that any of the three ways out leaves.
func divergence(x *finding.Context) (float64, bool) {
	u := 2 * x.Get(group.DivergenceSpeed)
	if x.Has(group.ThicknessRatio) && x.Get(group.ThicknessRatio) > 0 {
		u = least(u, 0.25/x.Get(group.ThicknessRatio))
	}
	if x.Has(group.TorsionRatio) && x.Get(group.TorsionRatio) > 0 {
		u = least(u, 2/x.Get(group.TorsionRatio))
	}
	return u, x.Has(group.DivergenceSpeed)
}
