package criterion

import (
	"regimed/regime/canon"
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// The criteria for fluidelastic instability: V_p/(f D) = K √(2πζm/(ρD²)) with
// f, ζ and m in the fluid, and K by source. They differ from the physical model
// in K alone, which there is that of the design value 3.
const fluidelastic = "no-fluidelastic-instability"

var (
	pettigrewTaylor = &finding.Criterion{
		ID: "pettigrew-taylor-1991", Assumption: fluidelastic, Field: "fluidelastic",
		Standard: "Pettigrew & Taylor 1991", Edition: "from memory", Clause: "design recommendation",
		Formula:  "V_p/(f D) < 3.0 √(2πζm/(ρD²))",
		Source:   cite.PettigrewTaylor1991,
		Applies:  func(x *finding.Context) bool { return x.Is(group.Array) },
		Estimate: byConstant(canon.TubeArrayDesignK),
		Say:      finding.Say("By Pettigrew & Taylor 1991, K = 3.0, the speed in the gaps stands at {u} of the critical one."),
	}
	asmeN1331Lower = &finding.Criterion{
		ID: "asme-n1331-lower", Assumption: fluidelastic, Field: "fluidelastic",
		Standard: "ASME BPVC Section III, Division 1, Appendix N", Edition: "from memory, edition not checked", Clause: "N-1331.3",
		Formula:  "V_p/(f D) < 2.4 √(2πζm/(ρD²)), lower bound of all layouts, for 2πζm/(ρD²) > 0.7",
		Source:   cite.ASMEN1331,
		Applies:  massDampingAbove,
		Estimate: byConstant(canon.TubeArrayASMELowerK),
		Say:      finding.Say("By ASME N-1331.3, lower bound K = 2.4, the speed in the gaps stands at {u} of the critical one."),
	}
	asmeN1331Mean = &finding.Criterion{
		ID: "asme-n1331-mean", Assumption: fluidelastic, Field: "fluidelastic",
		Standard: "ASME BPVC Section III, Division 1, Appendix N", Edition: "from memory, edition not checked", Clause: "N-1331.3",
		Formula:  "V_p/(f D) < 4.0 √(2πζm/(ρD²)), mean of all layouts, for 2πζm/(ρD²) > 0.7",
		Source:   cite.ASMEN1331,
		Applies:  massDampingAbove,
		Estimate: byConstant(canon.TubeArrayASMEMeanK),
		Say:      finding.Say("By ASME N-1331.3, mean K = 4.0, the speed in the gaps stands at {u} of the critical one."),
	}
	connors = &finding.Criterion{
		ID: "connors-1970", Assumption: fluidelastic, Field: "fluidelastic",
		Standard: "Connors 1970", Edition: "from memory", Clause: "one row of tubes, pitch ratio 1.41, in air",
		Formula: "V_p/(f D) < 9.9 √(2πζm/(ρD²))",
		Source:  cite.Connors1970,
		// a single row is no array: it decides only where a case asks for it
		Applies:  func(*finding.Context) bool { return false },
		Estimate: byConstant(canon.TubeArraySingleRowK),
		Say:      finding.Say("By Connors 1970, K = 9.9 for one row, the speed in the gaps stands at {u} of the critical one."),
	}
)

func massDampingAbove(x *finding.Context) bool {
	return x.Is(group.Array) && x.Has(group.ArrayMassDamping) && x.Get(group.ArrayMassDamping) > canon.TubeArrayASMEMinimum
}

// byConstant is the speed ratio with another constant than the design value.
func byConstant(k float64) func(x *finding.Context) (float64, bool) {
	return func(x *finding.Context) (float64, bool) {
		return x.Get(group.FluidelasticSpeed) * canon.TubeArrayDesignK / k, x.Has(group.FluidelasticSpeed)
	}
}
