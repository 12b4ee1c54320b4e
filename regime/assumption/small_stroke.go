package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// SmallStroke: the boundary of the fluid hardly moves.
var SmallStroke = &Entry{
	ID:        "small-stroke",
	Title:     "Small stroke",
	LeavesOut: "motion of the boundary of the fluid, and separation caused by the motion",
	Estimated: "load: ξ/L, ξ/gap; scale: KC against 2, where the flow begins to separate from a smooth cylinder; response: ζ_d/ζ, quadratic drag's equivalent damping",
	Measures:  []finding.Measure{finding.Load, finding.Scale, finding.Response},
	Sources:   []*cite.Source{cite.SumerFredsoe2006, cite.Blevins1990},
	Estimate:  estimateSmallStroke,
}

var (
	strokeLength     = finding.Say("The stroke is {e:%} of the flow length.")
	strokeGap        = finding.Say("The stroke is {e:%} of the gap.")
	strokeSeparation = finding.Say("KC = {keulegan_carpenter}; the flow begins to separate from a smooth cylinder at 2.")
	strokeDamping    = finding.Say("Quadratic drag makes {e:%} of the total damping: ζ_d = {drag_damping}.")
)

func estimateSmallStroke(x *finding.Context) {
	if !x.Is(group.Fluid) {
		x.NotApplicable(noFluid)
		return
	}
	if x.Is(group.StaticOnly) && !x.Has(group.Displacement) {
		x.NotApplicable(noFrequency)
		return
	}
	p := finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 1.5, Say: strokeLength, Source: cite.Blevins1990}
	x.AddOrWait(p, group.Displacement, identity)
	p.Say = strokeGap
	x.AddOrWait(p, group.DisplacementGap, identity)
	if x.Any(group.Bluff | group.Circular) {
		x.AddOrWait(finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 2, Factor: 1.5, Say: strokeSeparation, Source: cite.SumerFredsoe2006},
			group.KeuleganCarpenter, identity)
	}
	if x.Has(group.DragDamping) {
		addShare(x, finding.Part{Measure: finding.Response, Basis: finding.Canonical, Factor: 2, Say: strokeDamping, Source: cite.Blevins1990}, x.Get(group.DragDamping))
	}
}
