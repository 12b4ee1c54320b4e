// Package assumption is the catalogue of what a model may leave out: for each
// assumption the question, the measure, and an estimator of the error that it
// costs. Entries estimate; the verdict is finding.Judge's.
//
// Nothing here knows a unit: an estimator sees dimensionless groups, traits
// and a tolerance.
package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// Entry is one assumption.
type Entry struct {
	ID        string // stable: "fluid-absent"
	Title     string
	LeavesOut string // what a model that makes it leaves out
	Estimated string // how the error is estimated, in words and symbols
	Measures  []finding.Measure
	Sources   []*cite.Source
	Hazard    string // for hazards: the caution when it is active; empty otherwise
	Estimate  func(x *finding.Context)
	index     int
}

// Index is the place of the entry in the catalogue, and of its finding among
// the findings.
func (e *Entry) Index() int { return e.index }

// Catalogue lists the assumptions in the order in which they are judged:
// hazards first, since one-way coupling asks for theirs.
var Catalogue = number(
	// hazards
	NoLockIn, NoGalloping, NoDivergence, NoFlutter, NoBucklingByFlow, NoAcousticResonance, NoPressureSurge,
	NoFluidelasticInstability, NoWakeInterference, NoOvalling,
	NoWaveResonance, NoSloshingResonance, NoSlamming, NoShock,
	// still fluid
	FluidAbsent, StillFluid, InviscidOscillation, IncompressibleOscillation, UnboundedFluid,
	FreeSurfaceAbsent, RigidLid, LinearFreeSurface, IsothermalWalls, Continuum, SlipFilm,
	NoSurfaceTension, NoCavitation,
	// mean flow
	IncompressibleFlow, LinearCompressible, InviscidFlow, NoStall, LaminarFlow, SteadyFlow,
	TwoDimensional, QuasiSteady, PseudoStatic, CalibratedWake,
	QuasiStaticGusts,
	// structure
	RigidStructure, SmallDisplacement, SmallStroke, SingleMode, LinearStructure, PassiveStructure, NoPullIn,
	// scales of reduced models
	Lubrication, Slender, PlugFlow, OneDimensionalWaves, LongPulse, NoAxialCoupling, LongWave, RigidWalls,
	// coupling
	OneWay, ExplicitCoupling,
)

func number(entries ...*Entry) []*Entry {
	for i, e := range entries {
		e.index = i
	}
	return entries
}

// Find returns the entry of that id, or nil.
func Find(id string) *Entry {
	for _, e := range Catalogue {
		if e.ID == id {
			return e
		}
	}
	return nil
}

// Judge makes the findings of one case, in the order of the catalogue.
func Judge(g *group.Set, s finding.Study) *finding.Context {
	x := finding.NewContext(g, s, len(Catalogue))
	for i, e := range Catalogue {
		x.Begin(&x.Made[i])
		e.Estimate(x)
		x.Conclude()
	}
	return x
}
