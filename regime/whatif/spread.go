package whatif

import (
	"context"
	"runtime"

	"regimed/regime"
	"regimed/regime/input"
)

// The number of samples of a spread: how many there may be, and how many where
// nobody says.
const (
	MinSamples     = 64
	MaxSamples     = 65_536
	DefaultSamples = 1_024
)

// Spread says what the uncertainty of the inputs makes of the answer to a case:
// how its groups and utilisations spread, and how probable each verdict and each
// class is. It is nil where no input is uncertain.
//
// The inputs are taken as independent. Each sample is a draw of all of them, put
// into the case and judged. Samples are quasi-random: scrambled Halton points in
// the distributions of the inputs, in up to 16 replicates of the same length whose
// scramblings are independent. They are seeded from the pointers of the uncertain
// inputs and from nothing else, so that the same case gives the same numbers in
// any units and at any scale.
//
// samples is the most that are drawn, from [MinSamples] to [MaxSamples]; 0 stands
// for [DefaultSamples]. Drawing ends sooner where the probability of every class
// is known to ±0.01, two standard errors. A draw that an input, the order of an
// interval or the range of a property refuses is left out and counted; what is
// said is then what holds for the others.
//
// An error is that of the context.
func Spread(ctx context.Context, c *input.Case, samples int) (*regime.Spread, error) {
	if len(Uncertain(c)) == 0 {
		return nil, nil
	}
	s := newSampling(c, samples)
	for length := min(firstLook, s.most); ; length = min(length+length/2, s.most) {
		if err := s.grow(ctx, length); err != nil {
			return nil, err
		}
		r := s.shares()
		if r.Settled || length == s.most {
			return r, s.quantiles(ctx, r)
		}
	}
}

// Lengths and numbers of the replicates.
const (
	replicates    = 16
	fewReplicates = 8   // where there are few samples, so that each has some
	fewSamples    = 256 // below this
	firstLook     = 20  // length at which it is first asked whether the samples are enough; an outcome that is never seen is settled after 300 samples
	blockLength   = 64  // most draws that are judged by one worker in one go
)

// sampling is a spread in the making.
type sampling struct {
	drawing
	c      *input.Case
	most   int // length that a replicate may have
	length int // that each has now

	tallies []tally // by replicate
	outside int
	refusal []int // by input
	columns []pooled
}

func newSampling(c *input.Case, samples int) *sampling {
	if samples <= 0 {
		samples = DefaultSamples
	}
	samples = min(max(samples, MinSamples), MaxSamples)
	n := replicates
	if samples < fewSamples {
		n = fewReplicates
	}
	s := &sampling{drawing: newDrawing(c), c: c, most: samples / n}
	for range n {
		s.tallies = append(s.tallies, newTally())
	}
	s.refusal = make([]int, len(s.inputs))
	s.columns = make([]pooled, columnCount)
	return s
}

// stretch is a part of a replicate: some of its points.
type stretch struct {
	replicate int
	points    [][]float64
}

// grow makes every replicate as long as that. What it adds up comes in the order
// of the replicates, however many workers there are.
func (s *sampling) grow(ctx context.Context, length int) error {
	before := s.length
	s.length = length
	replicate, at := -1, length
	var points [][]float64
	next := func() (stretch, bool, error) {
		if at == length {
			if replicate++; replicate == len(s.tallies) {
				return stretch{}, false, nil
			}
			at, points = before, s.points(replicate, length)
		}
		from := at
		at = min(from+blockLength, length)
		return stretch{replicate, points[from:at]}, true, nil
	}
	work := func(t stretch) *outcome { return s.judge(ctx, t) }
	emit := func(b *outcome) error {
		s.add(b)
		return nil
	}
	return InOrder(ctx, runtime.GOMAXPROCS(0), next, work, emit)
}

func (s *sampling) add(b *outcome) {
	s.tallies[b.replicate].add(&b.tally)
	s.outside += b.outside
	for i, n := range b.refusal {
		s.refusal[i] += n
	}
	for i := range b.columns {
		s.columns[i].append(b.columns[i])
	}
}

// outcome is what judging a stretch gave.
type outcome struct {
	replicate int
	tally
	outside int
	refusal []int
	columns []series
}

// judge judges the draws of a stretch. It ends early, with a result that is of no
// use, where the context does.
func (s *sampling) judge(ctx context.Context, t stretch) *outcome {
	b := &outcome{replicate: t.replicate, tally: newTally(), refusal: make([]int, len(s.inputs))}
	c := s.c.Clone()
	rows := sheets.Get().(*sheet)
	defer sheets.Put(rows)
	rows.clear()
	for _, point := range t.points {
		if ctx.Err() != nil {
			return b
		}
		if refused := s.put(c, point); refused >= 0 {
			b.outside++
			b.refusal[refused]++
			continue
		}
		a, violations := regime.Judge(c)
		if len(violations) > 0 {
			b.outside++
			if i := s.blamed(violations); i >= 0 {
				b.refusal[i]++
			}
			continue
		}
		b.tally.count(a)
		rows.add(a)
		a.Release()
	}
	b.columns = rows.columns()
	return b
}
