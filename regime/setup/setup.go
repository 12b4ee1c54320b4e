// Package setup gives the figures that the next step of a pipeline needs once a
// model class is chosen: time step, duration, first cell, domain, relaxation.
// Each figure is a row with its rule and its source; a row that does not fit
// the class, or whose scales are not known, gives nothing.
package setup

import (
	"math"

	"regimed/regime/cite"
	"regimed/regime/group"
	"regimed/regime/ladder"
	"regimed/regime/scale"
	"regimed/units"
)

// Figure is one figure for setting the model up.
type Figure struct {
	Row     *Row
	Value   float64
	Governs bool // the one that decides among those of its purpose
}

// Row is the rule of one figure.
type Row struct {
	ID      string
	Title   string
	Kind    units.Kind
	Rule    string
	Purpose Purpose
	Source  *cite.Source
	For     func(c *Case) bool    // whether the class needs it
	Value   func(c *Case) float64 // NaN where it is not known
}

// Purpose groups figures of which one governs.
type Purpose uint8

// The purposes. Of the first two the least, or the largest, governs.
const (
	Other    Purpose = iota
	TimeStep         // the least governs
	Duration         // the largest governs
)

// Case is what a rule sees.
type Case struct {
	*scale.Set
	Groups *group.Set
	Class  *ladder.Class
	Axes   *ladder.Axes
}

// Figures evaluates the rows for a recommendation.
func Figures(s *scale.Set, g *group.Set, r *ladder.Recommendation) []Figure {
	c := &Case{Set: s, Groups: g, Class: r.Class, Axes: &r.Axes}
	figures := make([]Figure, 0, len(Rows))
	for i := range Rows {
		row := &Rows[i]
		if !row.For(c) {
			continue
		}
		if v := row.Value(c); v > 0 && !math.IsInf(v, 1) {
			figures = append(figures, Figure{Row: row, Value: v})
		}
	}
	govern(figures, TimeStep, func(a, b float64) bool { return a < b })
	govern(figures, Duration, func(a, b float64) bool { return a > b })
	return figures
}

func govern(figures []Figure, p Purpose, before func(a, b float64) bool) {
	best := -1
	for i := range figures {
		if figures[i].Row.Purpose == p && (best < 0 || before(figures[i].Value, figures[best].Value)) {
			best = i
		}
	}
	if best >= 0 {
		figures[best].Governs = true
	}
}

// known is the value of a group, NaN where it has none.
func (c *Case) known(id group.ID) float64 {
	if c.Groups.Has(id) {
		return c.Groups.Get(id)
	}
	return math.NaN()
}

// resolved reports whether the class has a flow on a mesh.
func resolved(c *Case) bool {
	return c.Axes.Fluid == "resolved" || c.Axes.Fluid == "steady"
}

// marching reports whether the class is marched in time.
func marching(c *Case) bool {
	return c.Axes.Fluid == "resolved" || c.Axes.Fluid == "wake-model"
}

func moving(c *Case) bool { return c.Groups.Any(group.Flow) }

func meshedFlow(c *Case) bool { return resolved(c) && moving(c) }

func dynamic(c *Case) bool { return !c.Groups.Is(group.StaticOnly) }

func iterated(c *Case) bool {
	return c.Axes.Coupling == "two-way-implicit" || c.Axes.Coupling == "monolithic-or-implicit"
}

// compressible reports whether the class carries sound.
func compressible(c *Case) bool { return c.Axes.Compressible == "yes" }

// freeSurface reports whether the class carries a free surface.
func freeSurface(c *Case) bool {
	return c.Axes.FreeSurface != "none" && c.Axes.FreeSurface != "" || c.Axes.Fluid == "resolved" && c.Groups.Any(group.Waves|group.Contained)
}
