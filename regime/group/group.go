// Package group holds the dimensionless groups of a case: the last place in the
// flow of data where a quantity can be traced back to a length or a mass, and
// the only thing, with the traits, that a verdict may depend on.
//
// The package knows no unit. What a group is made of is the business of the
// package kind, which fills a Set; what a group means stands in the table here.
package group

import (
	"math"
	"sync"
)

// ID names a group. The list is append-only.
type ID uint8

// Set holds the groups of one case. A missing group is NaN; Need then names
// the input that would settle it.
type Set struct {
	x     [Count]float64
	need  [Count]Need
	state [Count]State
	Traits
	Factors
	Band  Transition
	Modes Modes
}

// Modes are the reduced velocities U/(f_w D) of the modes that the kind can
// derive up to one and a half times the shedding frequency, first mode first.
type Modes struct {
	N int
	V [MaxModes]float64
}

// MaxModes is the largest number of modes that are looked at.
const MaxModes = 20

// State says how a group came to its value, or why it has none.
type State uint8

// The states of a group.
const (
	Absent   State = iota // does not arise in this case
	Known                 // has a value
	Missing               // arises, but an input is missing: see Need
	Adopted               // given by the caller as a group
	OffRange              // the canonical solution behind it does not reach so far
)

// Need names the input that a missing group waits for. The group would be
// (value/Coefficient)^Power for the input's value in Unit.
type Need struct {
	Input       string // "motion.amplitude"
	Unit        string // "m"
	Coefficient float64
	Power       float64
}

// InputFor returns the value of the missing input at which the group has the
// value g, or NaN where the group does not follow a power law in that input.
func (n Need) InputFor(g float64) float64 {
	if n.Power == 0 || !(g > 0) {
		return math.NaN()
	}
	if x := n.Coefficient * math.Pow(g, 1/n.Power); !math.IsInf(x, 1) {
		return x
	}
	return math.NaN()
}

// Transition is the band of the Reynolds number in which the flow of this kind
// turns turbulent.
type Transition struct {
	Low, High float64
	Length    ID // the Reynolds number that is meant
}

// Factors are the model-form factors φ by which a canonical geometry may
// differ from the one of the case, and constants of the kind.
type Factors struct {
	Inertia  float64 // added mass
	Viscous  float64 // Γ of the viscous solution
	Acoustic float64 // Γ of the acoustic solution
	Flow     float64 // flow stiffness, static deflection
	Buckling float64 // divergence and buckling by flow
	Flutter  float64

	Stiffening     float64 // κ of √(1 + κ(ξ/h)²), the stretching of held ends or edges
	StallPerRadian float64 // 1/α_stall
}

// Get returns the value of a group, NaN where it has none.
func (s *Set) Get(id ID) float64 { return s.x[id] }

// State returns how the group came to its value.
func (s *Set) State(id ID) State { return s.state[id] }

// Need returns the input that a missing group waits for.
func (s *Set) Need(id ID) Need { return s.need[id] }

// Has reports whether the group has a value.
func (s *Set) Has(id ID) bool { return s.state[id] == Known || s.state[id] == Adopted }

// Put gives a group its value. A value that is not finite leaves the group
// without one.
func (s *Set) Put(id ID, x float64) {
	if math.IsNaN(x) || math.IsInf(x, 0) {
		s.state[id] = OffRange
		s.x[id] = math.NaN()
		return
	}
	s.x[id] = x
	s.state[id] = Known
}

// Adopt takes a group as the caller gave it.
func (s *Set) Adopt(id ID, x float64) {
	s.Put(id, x)
	s.state[id] = Adopted
}

// Miss records that a group arises but waits for an input.
func (s *Set) Miss(id ID, n Need) {
	if n.Input == "" { // what it follows from has no value and waits for none
		s.Put(id, math.NaN())
		return
	}
	if !(n.Coefficient > 0) || math.IsInf(n.Coefficient, 1) { // no length or mass that can be computed with
		n.Coefficient, n.Power = 0, 0
	}
	s.x[id] = math.NaN()
	s.state[id] = Missing
	s.need[id] = n
}

// Drop records that a group does not arise.
func (s *Set) Drop(id ID) {
	s.x[id] = math.NaN()
	s.state[id] = Absent
}

var sets = sync.Pool{New: func() any { return new(Set) }}

// Release gives the memory of a set back; nothing may use it afterwards.
func (s *Set) Release() { sets.Put(s) }

// New returns a set in which no group has a value.
func New() *Set {
	s := sets.Get().(*Set)
	*s = Set{}
	for i := range s.x {
		s.x[i] = math.NaN()
	}
	return s
}
