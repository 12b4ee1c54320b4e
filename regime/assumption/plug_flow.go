package assumption

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// PlugFlow: the flow in a pipe has one speed.
var PlugFlow = &Entry{
	ID:        "plug-flow",
	Title:     "Plug flow",
	LeavesOut: "the profile of the flow in a pipe, and swirl",
	Estimated: "load: half the share that the momentum factor (4/3 laminar, 1.02 turbulent) adds to ρAU², which is its share in a critical speed, times U/U_c",
	Measures:  []finding.Measure{finding.Load},
	Sources:   []*cite.Source{cite.Paidoussis1998, cite.WhitePipe2006},
	Estimate:  estimatePlugFlow,
}

var (
	plugLaminar   = finding.Say("At Re = {reynolds} the profile is laminar or may be: the momentum factor 4/3 in place of 1 shifts the effect of the flow by {e:%}.")
	plugTurbulent = finding.Say("At Re = {reynolds} the profile is turbulent: the momentum factor 1.02 in place of 1 shifts the effect of the flow by {e:%}.")
	plugOutside   = finding.Say("The flow runs outside the structure: it has no profile between walls.")
	plugPulse     = finding.Say("The flow pulses: its profile is that of the Womersley number.")
)

// Momentum factors of pipe flow: of a parabola; of the 1/7 power law (White
// 2006, from memory).
const laminarMomentum, turbulentMomentum = 4.0 / 3, 1.02

func estimatePlugFlow(x *finding.Context) {
	switch {
	case !flows(x, group.Flow):
		return
	case x.Is(group.Pulsatile):
		x.NotApplicable(plugPulse)
		return
	case !x.Is(group.Internal):
		x.NotApplicable(plugOutside)
		return
	}
	p := finding.Part{Measure: finding.Load, Basis: finding.Canonical, Factor: 1.5, Say: plugLaminar, Source: cite.Paidoussis1998}
	if x.Has(group.Reynolds) && x.Get(group.Reynolds) >= pipeTurbulent {
		p.Say = plugTurbulent
	}
	near := nearOnset(x)
	x.AddOrWait(p, group.Reynolds, func(re float64) float64 {
		if re >= pipeTurbulent {
			return near * (1 - 1/turbulentMomentum) / 2
		}
		return near * (1 - 1/laminarMomentum) / 2
	})
}

// nearOnset is the speed over the critical one, at most 1, and 1 where it is not
// known: far below its onset the flow hardly counts, and its profile less.
func nearOnset(x *finding.Context) float64 {
	switch {
	case x.Has(group.FlutterSpeed):
		return math.Min(x.Get(group.FlutterSpeed), 1)
	case x.Has(group.BucklingSpeed):
		return math.Min(x.Get(group.BucklingSpeed), 1)
	default:
		return 1
	}
}

// pipeTurbulent is the Reynolds number from which pipe flow is turbulent.
const pipeTurbulent = 4000
