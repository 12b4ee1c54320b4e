package ladder

import (
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// axes fills in the axes that the class leaves to the findings.
func axes(c *Class, kind string, g *group.Set, fs []finding.Finding) Axes {
	a := c.Axes
	at := func(e *assumption.Entry) finding.Verdict { return fs[e.Index()].Verdict }
	invalid := func(e *assumption.Entry) bool { return at(e) == finding.Invalid && fs[e.Index()].OfInterest }
	set(&a.Compressible, yesNo(c.Axes.Fluid == "film" && g.Has(group.Squeeze) && g.Get(group.Squeeze) > 1 || invalid(assumption.IncompressibleFlow) || invalid(assumption.IncompressibleOscillation) || invalid(assumption.NoAcousticResonance)))
	set(&a.Viscous, yesNo(invalid(assumption.InviscidFlow) || invalid(assumption.InviscidOscillation)))
	set(&a.FreeSurface, freeSurface(at))
	if a.Viscous == "no" {
		set(&a.Turbulence, "none") // without viscosity there is no boundary layer to become turbulent
	}
	set(&a.Turbulence, turbulence(at(assumption.LaminarFlow)))
	set(&a.Structure, structure(c, invalid(assumption.SmallDisplacement) || invalid(assumption.LinearStructure), !invalid(assumption.RigidStructure) && g.Is(group.StaticOnly)))
	set(&a.FluidInertia, inertia(c, at(assumption.FluidAbsent)))
	set(&a.Phases, phases(g.Is(group.TwoPhase) || invalid(assumption.NoCavitation) || invalid(assumption.NoSurfaceTension)))
	set(&a.Dimensions, dimensions(at(assumption.TwoDimensional), g.Is(group.Uniform)))
	set(&a.Electromechanical, electromechanical(invalid(assumption.PassiveStructure)))
	return a
}

func set(axis *string, value string) {
	if *axis == "" {
		*axis = value
	}
}

func yesNo(b bool) string {
	if b {
		return "yes"
	}
	return "no"
}

func freeSurface(at func(*assumption.Entry) finding.Verdict) string {
	free, lid, linear := at(assumption.FreeSurfaceAbsent), at(assumption.RigidLid), at(assumption.LinearFreeSurface)
	held := func(v finding.Verdict) bool { return v == finding.NotApplicable || v == finding.Valid }
	switch {
	case held(free) && held(lid):
		return "none"
	case linear == finding.Invalid || lid == finding.Invalid || at(assumption.NoSlamming) == finding.Invalid:
		return "nonlinear"
	default:
		return "linear"
	}
}

func turbulence(laminar finding.Verdict) string {
	switch laminar {
	case finding.NotApplicable:
		return "none"
	case finding.Valid:
		return "laminar"
	case finding.Marginal, finding.Undetermined:
		return "transitional"
	default:
		return "turbulent"
	}
}

func structure(c *Class, nonlinear, static bool) string {
	switch {
	case nonlinear:
		return "nonlinear"
	case static && c.Axes.Coupling == "one-way":
		return "rigid"
	default:
		return "linear-modal"
	}
}

// inertia is none where the fluid may be left out, lumped in every class up to
// the one-way ones, and part of the flow in the resolved two-way classes.
func inertia(c *Class, absent finding.Verdict) string {
	switch {
	case absent == finding.Valid || absent == finding.NotApplicable:
		return "none"
	case c.Rank <= lastLumpedRank:
		return "lumped"
	default:
		return "resolved"
	}
}

func electromechanical(coupled bool) string {
	if coupled {
		return "coupled"
	}
	return "none"
}

func phases(two bool) string {
	if two {
		return "two"
	}
	return "single"
}

func dimensions(v finding.Verdict, uniform bool) string {
	switch {
	case v == finding.Valid || v == finding.Marginal:
		return "two"
	case v == finding.NotApplicable && uniform:
		return "two"
	default:
		return "three"
	}
}
