package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// LinearStructure: the material is linear.
var LinearStructure = &Entry{
	ID:        "linear-structure",
	Title:     "Linear material",
	LeavesOut: "material and contact nonlinearity",
	Estimated: "scale: largest bending strain over the strain up to which the material is linear",
	Measures:  []finding.Measure{finding.Scale},
	Sources:   []*cite.Source{cite.Timoshenko1974},
	Estimate:  estimateLinearStructure,
}

var strain = finding.Say("The largest bending strain is {e} of the strain up to which the material is linear.")

func estimateLinearStructure(x *finding.Context) {
	switch {
	case !x.Is(group.Flexible):
		x.NotApplicable(rigidKind)
	case x.Is(group.StaticOnly) && !x.Has(group.StrainRatio):
		x.NotApplicable(noFrequency)
	default:
		p := finding.Part{Measure: finding.Scale, Basis: finding.Threshold, Factor: 1.5, Say: strain, Source: cite.Timoshenko1974}
		if x.Is(group.Pulsatile) {
			p.Say, p.Source = pulseHoop, cite.FungCirculation
		}
		x.AddOrWait(p, group.StrainRatio, identity)
	}
}
