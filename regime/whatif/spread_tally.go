package whatif

import (
	"math"

	"regimed/regime"
	"regimed/regime/assumption"
	"regimed/regime/finding"
	"regimed/regime/ladder"
)

// tally counts what came out of a number of draws.
type tally struct {
	judged   int
	classes  []int                      // by row of ladder.Classes
	verdicts [][finding.Invalid + 1]int // by index of the assumption
}

func newTally() tally {
	return tally{classes: make([]int, len(ladder.Classes)), verdicts: make([][finding.Invalid + 1]int, len(assumption.Catalogue))}
}

func (t *tally) count(a *regime.Answer) {
	t.judged++
	for i := range ladder.Classes {
		if &ladder.Classes[i] == a.Recommendation.Class {
			t.classes[i]++
		}
	}
	for i := range a.Findings {
		t.verdicts[i][a.Findings[i].Verdict]++
	}
}

func (t *tally) add(o *tally) {
	t.judged += o.judged
	for i, n := range o.classes {
		t.classes[i] += n
	}
	for i := range o.verdicts {
		for v, n := range o.verdicts[i] {
			t.verdicts[i][v] += n
		}
	}
}

// Known is how well every class probability has to be known, as two standard
// errors, for the samples to be enough.
const Known = 0.01

// shares makes probabilities of the counts.
func (s *sampling) shares() *regime.Spread {
	r := &regime.Spread{Inputs: s.inputs, Outside: s.outside, Refusals: s.refusal, Settled: true}
	for i := range s.tallies {
		r.Samples += s.tallies[i].judged
	}
	for i := range ladder.Classes {
		p := shareOf(s.tallies, func(t *tally) int { return t.classes[i] })
		if p.Share > 0 {
			r.Classes = append(r.Classes, regime.ClassProbability{Class: &ladder.Classes[i], Probability: p})
		}
		if 2*p.StandardError > Known {
			r.Settled = false
		}
	}
	r.Verdicts = make([]regime.VerdictProbability, len(assumption.Catalogue))
	for i := range r.Verdicts {
		for v := range r.Verdicts[i] {
			r.Verdicts[i][v] = shareOf(s.tallies, func(t *tally) int { return t.verdicts[i][v] })
		}
	}
	return r
}

// shareOf estimates a probability from replicates that are independent of each
// other, though the draws within one are not:
//
//	p = Σh_r/Σn_r,  s² = R/(R − 1) Σ(h_r − p n_r)²/(Σn_r)²
//
// with n_r draws judged in replicate r of R, h_r of them a hit; the error is that
// of a ratio, since draws may have been left out.
//
// s is at least 1.5/Σn_r: an outcome that is never seen in n independent draws has
// with 95 % a probability of less than 3/n (rule of three: Hanley & Lippman-Hand,
// JAMA 249, 1983, from memory), which is taken for two standard errors; and
// replicates may agree by chance. It is at most 0.5, beyond which it would say
// nothing, and that where nothing was judged.
func shareOf(tallies []tally, of func(*tally) int) regime.Probability {
	const ruleOfThree, most = 1.5, 0.5
	hits, judged := 0, 0
	for i := range tallies {
		hits += of(&tallies[i])
		judged += tallies[i].judged
	}
	if judged == 0 {
		return regime.Probability{StandardError: most}
	}
	n, replicates := float64(judged), float64(len(tallies))
	p := float64(hits) / n
	sum := 0.0
	for i := range tallies {
		off := float64(of(&tallies[i])) - p*float64(tallies[i].judged)
		sum += off * off
	}
	s := math.Sqrt(sum*replicates/(replicates-1)) / n
	return regime.Probability{Share: p, StandardError: min(max(s, ruleOfThree/n), most)}
}
