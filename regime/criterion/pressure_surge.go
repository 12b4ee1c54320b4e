package criterion

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// asmeB314 is the surge allowance of the code for liquid pipelines. The gauge
// pressure of the case stands for the internal design pressure of the code.
var asmeB314 = &finding.Criterion{
	ID: "asme-b31.4", Assumption: "no-pressure-surge", Field: "pressure_surge",
	Standard: "ASME B31.4", Edition: "from memory, edition not checked", Clause: "surge allowance",
	Formula: "p + Δp ≤ 1.1 p, p the internal design pressure (gauge)",
	Source:  cite.ASMEB314,
	Applies: func(x *finding.Context) bool { return x.Is(group.Internal | group.Liquid) },
	Estimate: func(x *finding.Context) (float64, bool) {
		return x.Get(group.SurgePressure) / 0.1, x.Has(group.SurgePressure)
	},
	Say: finding.Say("By ASME B31.4 the surge stands at {u} of the allowance of a tenth of the pressure."),
}
