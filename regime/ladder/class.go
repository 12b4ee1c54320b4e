// Package ladder holds the model classes, cheapest first, and chooses among
// them: the recommendation is the cheapest class in its domain none of whose
// assumptions is invalid.
package ladder

import (
	"slices"

	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
)

// Class is one model class: a row of the ladder.
type Class struct {
	ID      string
	Title   string
	Solves  string // what is solved
	Rank    int    // rank of cost
	RestsOn []*assumption.Entry
	Domain  Domain
	Axes    Axes // what the class fixes; empty axes are set by the findings
}

// Domain says where a class can be asked at all.
type Domain struct {
	Kinds  []string     // empty: every kind
	States group.Traits // fluid states that the class covers; a case's states must all be among them
	Dry    bool         // also without any fluid
	Needs  group.Traits // traits that must hold
	Bars   group.Traits // traits of which none may hold
}

// states are the traits that are states of the fluid.
const states = group.Still | group.Cross | group.Axial | group.Grazing | group.Internal | group.Waves | group.Contained

// Covers reports whether a case is in the domain.
func (d *Domain) Covers(kind string, t group.Traits) bool {
	if len(d.Kinds) > 0 && !slices.Contains(d.Kinds, kind) {
		return false
	}
	if !t.Is(d.Needs) || t.Any(d.Bars) {
		return false
	}
	if !t.Is(group.Fluid) {
		return d.Dry
	}
	return t&states&^d.States == 0
}

// Axes are what a class stands for, on the axes that pipelines branch on.
type Axes struct {
	Fluid             string
	Compressible      string
	Viscous           string
	FreeSurface       string
	Turbulence        string
	Structure         string
	Coupling          string
	FluidInertia      string
	Phases            string
	Dimensions        string
	Electromechanical string
}

// Axis is the name of an axis and the values that it can have.
type Axis struct {
	ID     string
	Values []string
	Of     func(a *Axes) *string
}

// AxisList lists the axes in the order of the answer.
var AxisList = []Axis{
	{"fluid", []string{"none", "added-mass", "viscous-still", "acoustic", "thermoviscous", "free-surface", "film", "one-dimensional", "steady", "quasi-steady", "linear-unsteady", "wake-model", "resolved"}, func(a *Axes) *string { return &a.Fluid }},
	{"compressible", []string{"yes", "no"}, func(a *Axes) *string { return &a.Compressible }},
	{"viscous", []string{"yes", "no"}, func(a *Axes) *string { return &a.Viscous }},
	{"free_surface", []string{"none", "linear", "nonlinear"}, func(a *Axes) *string { return &a.FreeSurface }},
	{"turbulence", []string{"none", "laminar", "transitional", "turbulent"}, func(a *Axes) *string { return &a.Turbulence }},
	{"structure", []string{"rigid", "linear-modal", "nonlinear"}, func(a *Axes) *string { return &a.Structure }},
	{"coupling", []string{"none", "one-way", "two-way-explicit", "two-way-implicit", "monolithic-or-implicit", "analytic"}, func(a *Axes) *string { return &a.Coupling }},
	{"fluid_inertia", []string{"none", "lumped", "resolved"}, func(a *Axes) *string { return &a.FluidInertia }},
	{"phases", []string{"single", "two"}, func(a *Axes) *string { return &a.Phases }},
	{"dimensions", []string{"two", "three"}, func(a *Axes) *string { return &a.Dimensions }},
	{"electromechanical", []string{"none", "coupled"}, func(a *Axes) *string { return &a.Electromechanical }},
}

// Find returns the class of that id, or nil.
func Find(id string) *Class {
	for i := range Classes {
		if Classes[i].ID == id {
			return &Classes[i]
		}
	}
	return nil
}

// holds reports whether no assumption of the class is invalid.
func (c *Class) holds(fs []finding.Finding) bool {
	for _, e := range c.RestsOn {
		if fs[e.Index()].RulesOut() {
			return false
		}
	}
	return true
}
