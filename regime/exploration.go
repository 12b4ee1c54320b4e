package regime

import (
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/ladder"
)

// Driver is the sensitivity of a finding to one input: ∂ln u/∂ln x, u its
// utilisation.
type Driver struct {
	Place       input.Place
	Sensitivity float64
}

// Turn is the nearest value of one input, above or below the one of the case,
// from which another class is recommended.
type Turn struct {
	Place   input.Place
	Up      bool
	Value   float64           // SI; a gauge pressure as such where it was given as one; 0: at once, from a zero
	Factor  float64           // of the value of the case, a gauge pressure counting as the absolute one; NaN where that is zero
	Entry   *assumption.Entry // whose verdict turns; nil where the domain of the classes changes
	Verdict finding.Verdict   // that it turns to
	Class   *ladder.Class     // recommended beyond
}

// Quantiles are the values below which 5, 50 and 95 % lie.
type Quantiles [3]float64

// Probability is a share of the samples, with its standard error.
type Probability struct {
	Share         float64
	StandardError float64
}

// ClassProbability is how probable it is that a class is recommended.
type ClassProbability struct {
	Class *ladder.Class
	Probability
}

// VerdictProbability is how probable each verdict of a finding is, by
// finding.Verdict.
type VerdictProbability [finding.Invalid + 1]Probability

// Spread is what the uncertainty of the inputs makes of the answer.
type Spread struct {
	Inputs  []input.Place // the uncertain ones, by pointer
	Samples int           // that were judged
	Outside int           // draws beyond the range of an input or a property: left out
	// Refusals are, by input, how many of these were left out for it; those that
	// are missing from the sum were left out for what follows from several inputs.
	Refusals []int
	Settled  bool // every class probability is known to ±0.01, so that fewer samples were enough

	Classes      []ClassProbability   // cheapest first, only those that occurred
	Verdicts     []VerdictProbability // by the order of assumption.Catalogue
	Utilisations []Quantiles          // likewise; NaN where there is none
	Groups       map[group.ID]Quantiles
}
