package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/criterion"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoFluidelasticInstability: the tubes of an array do not whirl.
var NoFluidelasticInstability = &Entry{
	ID:        "no-fluidelastic-instability",
	Title:     "No fluidelastic instability",
	LeavesOut: "the forces by which tubes that move shape the flow that drives their neighbours",
	Estimated: "highest speed in the gaps over the critical one, K f_w D √(2πζm/(ρD²)) with K = 3.0; f_w, ζ and m (tube, contents and added mass) in the fluid",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.PettigrewTaylor1991, cite.Connors1970, cite.ASMEN1331},
	Hazard:    "Fluidelastic instability wears tubes through within hours to days: the code in force and the owner's margin on the critical speed decide.",
	Estimate:  estimateFluidelastic,
}

var (
	fluidelastic        = finding.Say("The speed in the gaps comes to {e} of the critical one in operation; the mass-damping 2πζm/(ρD²) is {array_mass_damping}.")
	fluidelasticWaits   = finding.Say("The critical speed rises with the square root of the damping in the fluid, which is not known.")
	noArray             = finding.Say("The structure is no tube among tubes in cross flow.")
	fluidelasticUnmoved = finding.Say("No frequency is given or of interest: a static case.")
)

func estimateFluidelastic(x *finding.Context) {
	switch {
	case !flows(x, group.Flow):
		return
	case !x.Is(group.Array | group.Cross):
		x.NotApplicable(noArray)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(fluidelasticUnmoved)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Canonical, Factor: 1.5, Say: fluidelastic, Source: cite.PettigrewTaylor1991}
	if x.State(group.FluidelasticSpeed) == group.Missing {
		p.Say = fluidelasticWaits
	}
	x.AddOrWait(p, group.FluidelasticSpeed, identity)
	x.Publish(criterion.All, "no-fluidelastic-instability")
}
