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
	Estimated: "load: bluff bodies 1; in waves the share of the drag in the largest load; attached flow: displacement thickness over the thickness of the body, for a flush panel times k_b; in a bore the friction fℓ/D over one dynamic pressure",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.Schlichting1979},
	Estimate:  estimateInviscidFlow,
}

var (
	separates      = finding.Say("The flow separates from a bluff body: an inviscid flow has no drag and no wake.")
	dragInWaves    = finding.Say("Without drag the largest wave load is off by {e:%}: the drag is {drag_inertia} of the inertia force.")
	behindBody     = finding.Say("The structure lies in the wake of a bluff body, which an inviscid flow does not have.")
	frictionInside = finding.Say("Friction takes {friction_loss} dynamic pressures along the bore.")
	layerThick     = finding.Say("The boundary layers displace the flow by {e:%} of the length that shapes it.")
)

func estimateInviscidFlow(x *finding.Context) {
	switch {
	case !flows(x, group.Flow|group.Waves): // said why
	case !x.Any(group.Flow):
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: dragInWaves, Source: cite.Morison1950},
			group.DragInertia, dragExcess)
	case x.Is(group.WakeOfBody):
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: behindBody, Source: cite.Schlichting1979})
	case x.Is(group.Bluff):
		x.Add(finding.Part{Measure: finding.Load, Basis: finding.Definition, Estimate: 1, Factor: 1, Say: separates, Source: cite.Schlichting1979})
	case x.Is(group.Internal):
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: frictionInside, Source: cite.Haaland1983},
			group.FrictionLoss, identity)
	default:
		x.AddOrWait(finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 2, Say: layerThick, Source: cite.Schlichting1979},
			group.BoundaryLayer, identity)
	}
}

// dragExcess is the share of the largest wave load that an inviscid fluid lacks:
// drag and inertia are a quarter period apart, and their sum
// F_D cos|cos| + F_I sin peaks at F_I up to r = F_D/F_I = ½, and at
// F_D + F_I²/(4 F_D) beyond.
func dragExcess(r float64) float64 {
	if r <= 0.5 {
		return 0
	}
	return 1 - 1/(r+1/(4*r))
}
