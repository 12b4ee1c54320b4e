package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// LaminarFlow: no turbulence. No class rests on it; it sets the axis
// turbulence.
var LaminarFlow = &Entry{
	ID:        "laminar-flow",
	Title:     "Laminar flow",
	LeavesOut: "turbulence",
	Estimated: "scale: Re in the transition band of the kind: the wake of a bluff body 190 to 300, a plate along the flow 3e5 to 3e6, a bore 2300 to 4000; a pulse also by its peak, 150 to 250 times the Womersley number",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Williamson1996, cite.Schlichting1979},
	Estimate:  estimateLaminar,
}

var (
	wakeTurbulent  = finding.Say("At Re = {reynolds} the wake lies {e} times the middle of its transition from 190 to 300.")
	layerTurbulent = finding.Say("At Re = {reynolds} the boundary layer lies {e} times the middle of its transition from 3e5 to 3e6.")
	boreTurbulent  = finding.Say("At Re = {reynolds} the flow in the bore lies {e} times the middle of its transition from 2300 to 4000.")
	bodyTurbulent  = finding.Say("At Re = {body_reynolds} the wake of the leading body lies {e} times the middle of its transition from 190 to 300.")
	chordTurbulent = finding.Say("At Re = {chord_reynolds} the boundary layer lies {e} times the middle of its transition from 3e5 to 3e6.")
	plateTurbulent = finding.Say("At Re = {length_reynolds} the boundary layer lies {e} times the middle of its transition from 3e5 to 3e6.")
)

func estimateLaminar(x *finding.Context) {
	if !flows(x, group.Flow|group.Waves) {
		return
	}
	b := x.Set.Band
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: math.Sqrt(b.High / b.Low), Say: wakeTurbulent, Source: cite.Williamson1996}
	switch {
	case b.Length == group.BodyReynolds:
		p.Say = bodyTurbulent
	case b.Length == group.ChordReynolds:
		p.Say, p.Source = chordTurbulent, cite.Schlichting1979
	case b.Length == group.LengthReynolds:
		p.Say, p.Source = plateTurbulent, cite.Schlichting1979
	case x.Is(group.Internal):
		p.Say, p.Source = boreTurbulent, cite.WhitePipe2006
	case b.Low > 1e4:
		p.Say, p.Source = layerTurbulent, cite.Schlichting1979
	}
	x.AddOrWait(p, b.Length, func(re float64) float64 { return re / math.Sqrt(b.Low*b.High) })
	if x.Is(group.Pulsatile) {
		addPulsePeak(x)
	}
}
