package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// SmallStroke: the boundary of the fluid hardly moves.
var SmallStroke = &Entry{
	ID:        "small-stroke",
	Title:     "Small stroke",
	LeavesOut: "motion of the boundary of the fluid, and separation caused by the motion",
	Estimated: "load: ξ/L, in waves 2πξ/λ, ξ/gap; scale: KC against 2, where the flow begins to separate from a smooth cylinder; response: ζ_d/ζ, quadratic drag's equivalent damping",
	Measures:  []finding.Measure{finding.Load, finding.Scale, finding.Response},
	Sources:   []*cite.Source{cite.SumerFredsoe2006, cite.Blevins1990},
	Estimate:  estimateSmallStroke,
}

var (
	strokeLength     = finding.Say("The stroke is {e:%} of the flow length.")
	strokeGap        = finding.Say("The stroke is {e:%} of the gap.")
	strokeSeparation = finding.Say("KC = {keulegan_carpenter}; the flow begins to separate from a smooth cylinder at 2.")
	strokeWave       = finding.Say("The stroke is {e:%} of the wavelength over 2π.")
	strokeOfTank     = finding.Say("The liquid moves with the tank: how far counts at its surface, which linear-free-surface judges.")
	strokeDamping    = finding.Say("Quadratic drag makes {e:%} of the total damping: ζ_d = {drag_damping}.")
)

func estimateSmallStroke(x *finding.Context) {
	if !x.Is(group.Fluid) {
		x.NotApplicable(noFluid)
		return
	}
	if x.Is(group.Sloshing) {
		x.NotApplicable(strokeOfTank)
		return
	}
	if x.Is(group.StaticOnly) && !x.Has(group.Displacement) {
		x.NotApplicable(noFrequency)
		return
	}
	if x.Is(group.Column) {
		addStrokeAround(x)
		return
	}
	p := finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 1.5, Say: strokeLength, Source: cite.Blevins1990}
	if x.Is(group.Waves) { // the water moves along: what counts is how far in the wave
		p.Say, p.Source = strokeWave, cite.Newman1977
		x.AddOrWait(p, group.DisplacementWave, identity)
	} else {
		x.AddOrWait(p, group.Displacement, identity)
	}
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

var (
	strokeInside = finding.Say("The fluid is inside and moves with the bore: what a large stroke changes is the slope of the pipe.")
	strokeAround = finding.Say("The stroke is {e:%} of the outside diameter, in the liquid around.")
)

// addStrokeAround adds what the stroke does to the liquid around a pipe; the
// fluid inside follows the bore, however far that moves.
func addStrokeAround(x *finding.Context) {
	if x.State(group.KeuleganCarpenter) == group.Absent {
		x.NotApplicable(strokeInside)
		return
	}
	p := finding.Part{Measure: finding.Load, Basis: finding.Threshold, Factor: 1.5, Say: strokeAround, Source: cite.Blevins1990}
	x.AddOrWait(p, group.KeuleganCarpenter, func(kc float64) float64 { return kc / (2 * math.Pi) })
	p.Measure, p.Limit, p.Say, p.Source = finding.Scale, 2, strokeSeparation, cite.SumerFredsoe2006
	x.AddOrWait(p, group.KeuleganCarpenter, identity)
}
