package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// LongPulse: the pulse is long and widens the tube little.
var LongPulse = &Entry{
	ID:        "long-pulse",
	Title:     "Long pulse wave",
	LeavesOut: "flow across the tube in a pulse, and large widening of the wall",
	Estimated: "scale: radius over wavelength R f/c, and hoop strain Δp R/(E h) of the pulse, against 0.1",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.WomersleyWave1957, cite.FungCirculation},
	Estimate:  estimateLongPulse,
}

var (
	pulseLong   = finding.Say("The radius is {pulse_length} of the length of the pulse wave; a pulse is long below 0.1.")
	pulseStrain = finding.Say("The pulse stretches the wall by {wall_strain:%}; the linear tube holds to about 10 %.")
	noPulse     = finding.Say("No pulse runs through a compliant tube.")
)

func estimateLongPulse(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case !x.Is(group.Pulsatile):
		x.NotApplicable(noPulse)
		return
	}
	p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Limit: 0.1, Factor: 1.5, Say: pulseLong, Source: cite.WomersleyWave1957}
	x.AddOrWait(p, group.PulseLength, identity)
	p.Say, p.Source = pulseStrain, cite.FungCirculation
	x.AddOrWait(p, group.WallStrain, identity)
}
