package whatif

import (
	"context"
	"fmt"
	"slices"

	"regimed/regime"
	"regimed/regime/input"
	"regimed/regime/kind"
)

// Options say what is asked about a case besides its answer.
type Options struct {
	Samples int  // most samples of a spread, from [MinSamples] to [MaxSamples]; 0: [DefaultSamples]
	Explore bool // the drivers of each finding, and the turning points
}

// Classify is [regime.Classify] with what varying the inputs adds: where an input
// is uncertain, how the answer spreads; and, if asked for, what would change it.
// An error is that of the context.
func Classify(ctx context.Context, c *input.Case, o Options) (*regime.Answer, []input.Violation, error) {
	a, violations := regime.Classify(c)
	if len(violations) > 0 {
		return nil, violations, nil
	}
	if err := o.add(ctx, a); err != nil {
		a.Release()
		return nil, nil, err
	}
	return a, nil, nil
}

func (o Options) add(ctx context.Context, a *regime.Answer) error {
	s, err := Spread(ctx, a.Case, o.Samples)
	if err != nil {
		return err
	}
	if s != nil {
		a.Spread = s
		a.Warnings = append(slices.DeleteFunc(a.Warnings, func(w kind.Warning) bool { return w.Code == kind.UncertainCode }), outsideWarnings(s)...)
	}
	if !o.Explore {
		return nil
	}
	return Explore(ctx, a)
}

// OutsideCode is the code of the warning that many draws were left out.
const OutsideCode = "uncertain-outside"

// manyOutside is the part of the draws that may be left out without a warning.
const manyOutside = 0.01

// outsideWarnings say where many draws were left out: what is said of the answer
// then holds for the rest only.
func outsideWarnings(s *regime.Spread) []kind.Warning {
	drawn := s.Samples + s.Outside
	many := func(n int) bool { return float64(n) > manyOutside*float64(drawn) }
	if !many(s.Outside) {
		return nil
	}
	held := "probabilities and quantiles are those of the others"
	if s.Samples == 0 {
		held = "none is left to say how the answer spreads"
	}
	var list []kind.Warning
	rest := s.Outside
	for i, n := range s.Refusals {
		if !many(n) {
			continue
		}
		rest -= n
		p := s.Inputs[i]
		list = append(list, kind.Warning{Pointer: p.Pointer(), Code: OutsideCode, Sentence: fmt.Sprintf(
			"%d of %d draws of %s lie outside what it may be and were left out; %s. Give a spread that stays within.", n, drawn, p.Path(), held)})
	}
	if many(rest) || len(list) == 0 {
		list = append(list, kind.Warning{Code: OutsideCode, Sentence: fmt.Sprintf(
			"%d of %d draws lie outside what the case allows and were left out; %s.", rest, drawn, held)})
	}
	return list
}
