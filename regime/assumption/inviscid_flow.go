package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// InviscidFlow: boundary layers and separation may be left out.
var InviscidFlow = &Entry{
	ID:        "inviscid-flow",
	Title:     "Inviscid mean flow",
	LeavesOut: "boundary layer and separation",
	Estimated: "load: bluff bodies 1; attached flow: displacement thickness over the thickness of the body, for a flush panel times k_b",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.Schlichting1979},
	Estimate:  estimateInviscidFlow,
}

var (
	separates  = finding.Say("The flow separates from a bluff body: an inviscid flow has no drag and no wake.")
	layerThick = finding.Say("The boundary layers displace the flow by {e:%} of the length that shapes it.")
)

func estimateInviscidFlow(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
	case !x.Any(group.Flow):
		x.NotApplicable(noFlow)
	case x.Is(group.Bluff):
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: separates, Source: cite.Schlichting1979})
	default:
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 2, Say: layerThick, Source: cite.Schlichting1979},
			group.BoundaryLayer, identity)
	}
}
