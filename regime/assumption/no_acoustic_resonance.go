package assumption

import (
	"regimed/regime/cite"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// NoAcousticResonance: no standing sound wave meets the mode.
var NoAcousticResonance = &Entry{
	ID:        "no-acoustic-resonance",
	Title:     "No acoustic resonance of the cavity or the duct",
	LeavesOut: "a standing sound wave at the frequency of the mode",
	Estimated: "position of the wet frequency in 0.8 … 1.25 of the first acoustic frequency of the cavity, c/(2d); in a tube array position of the shedding frequency in 0.8 … 1.25 of the acoustic frequencies across the duct, n c/(2W√(1 + σ)), σ the solidity",
	Measures:  []finding.Measure{finding.Stability},
	Sources:   []*cite.Source{cite.ThisMethod, cite.KinslerFrey2000, cite.Parker1978},
	Hazard:    "A structure in resonance with a closed cavity, or a tube bundle with its shell, is loud and can fatigue: measure before it goes into service.",
	Estimate:  estimateAcousticResonance,
}

var (
	cavityResonance = finding.Say("The wet frequency is {cavity_frequency} of the first acoustic frequency of the cavity.")
	noCavity        = finding.Say("There is no closed cavity, and no duct across which sound could stand.")
	ductMeets       = finding.Say("Shedding comes to {duct_resonance} of the frequency of acoustic mode {duct_mode} across the duct, in which the tubes slow the sound.")
	ductWidthWaits  = finding.Say("Whether shedding meets sound across the duct depends on its width.")
	bubblesDamp     = finding.Say("A mixture of liquid and gas damps sound within a wave length: none stands across the duct.")
)

// Band of a resonance: within a quarter of coincidence, a judgement that
// covers the width of a lightly damped resonance and the error of both
// frequencies.
const resonanceLow, resonanceHigh = 0.8, 1.25

func estimateAcousticResonance(x *finding.Context) {
	switch {
	case !x.Is(group.Fluid):
		x.NotApplicable(noFluid)
		return
	case x.Is(group.Duct | group.Cross):
		ductResonance(x)
		return
	case x.Is(group.Column) && !x.Is(group.StaticOnly):
		addColumnResonance(x)
		return
	case !x.Is(group.Cavity):
		x.NotApplicable(noCavity)
		return
	case x.Is(group.StaticOnly):
		x.NotApplicable(noFrequency)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.15, Say: cavityResonance, Source: cite.ThisMethod}
	if x.Has(group.CavityFrequency) {
		p.Estimate, p.Inner = finding.Band(x.Get(group.CavityFrequency), resonanceLow, resonanceHigh, p.Factor)
		x.Add(p)
		return
	}
	waitOn(x, p, group.CavityFrequency)
}

// ductResonance judges shedding in a tube array against the standing waves
// across its duct or shell.
func ductResonance(x *finding.Context) {
	switch {
	case x.Is(group.TwoPhase):
		x.NotApplicable(bubblesDamp)
		return
	case x.Has(group.Strouhal) && x.Get(group.Strouhal) == 0:
		x.NotApplicable(noShedding)
		return
	}
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.15, Say: ductMeets, Source: cite.Parker1978}
	if !x.Has(group.DuctResonance) {
		p.Say = ductWidthWaits
		x.AddOrWait(p, group.DuctResonance, func(v float64) float64 { return v / resonanceLow })
		return
	}
	p.Estimate, p.Inner = finding.Band(x.Get(group.DuctResonance), resonanceLow, resonanceHigh, p.Factor)
	x.Add(p)
}

var (
	columnResonance = finding.Say("The wet frequency is {column_frequency} of acoustic mode {column_mode} of the column of fluid: they meet at bends and ends.")
	noColumnLength  = finding.Say("No length is known between whose ends the column of fluid could stand in resonance.")
)

// addColumnResonance holds the mode against the column of fluid in a pipe. A
// plane wave pulls at bends and ends and not at a straight pipe, so that the
// band asks for a check (20 % apart: API 618) and by itself forbids nothing:
// the inner factor is the width of the band.
func addColumnResonance(x *finding.Context) {
	p := finding.Part{Measure: finding.Stability, Basis: finding.Threshold, Factor: 1.15, Inner: resonanceHigh, Say: columnResonance, Source: cite.API618}
	if x.Has(group.ColumnFrequency) {
		p.Estimate, _ = finding.Band(x.Get(group.ColumnFrequency), resonanceLow, resonanceHigh, p.Factor)
		x.Add(p)
		return
	}
	if x.State(group.ColumnFrequency) != group.Missing {
		x.NotApplicable(noColumnLength)
		return
	}
	waitOn(x, p, group.ColumnFrequency)
}
