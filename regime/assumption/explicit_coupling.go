package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// ExplicitCoupling: one exchange a time step.
var ExplicitCoupling = &Entry{
	ID:        "explicit-coupling",
	Title:     "Explicit coupling",
	LeavesOut: "sub-iterations of a partitioned scheme",
	Estimated: "stability: μ of the softest wetted mode over 0.5; in a compressible solver ρcΔt/m″ in place of μ where that is less",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.Causin2005, cite.Forster2007, cite.VanBrummelen2009},
	Estimate:  estimateExplicit,
}

var (
	explicitMass  = finding.Say("The added mass is {added_mass_ratio} of the dry mass; one exchange a step is unstable at any time step from about 0.5 on.")
	explicitFree  = finding.Say("In its softest motion the body takes along {added_mass_ratio_softest} of its mass; one exchange a step is unstable at any time step from about 0.5 on.")
	explicitSound = finding.Say("In a compressible fluid a step of a twentieth of a period sees an added mass of {acoustic_step} of the dry mass; a smaller step lowers it.")
)

func estimateExplicit(x *finding.Context) {
	if !x.Is(group.Fluid) {
		x.NotApplicable(noFluid)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Limit: 0.5, Factor: 1.5, Say: explicitMass, Source: cite.Causin2005}
	if x.Has(group.AcousticStep) && x.Get(group.AcousticStep) < orZero(x, group.AddedMassRatio) {
		p.Estimate, p.Say, p.Source = x.Get(group.AcousticStep), explicitSound, cite.VanBrummelen2009
		x.Add(p)
		return
	}
	x.AddOrWait(p, group.AddedMassRatio, identity)
	if x.Has(group.AddedMassSoftest) {
		p.Estimate, p.Say = x.Get(group.AddedMassSoftest), explicitFree
		x.Add(p)
	}
}
