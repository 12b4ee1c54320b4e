package whatif

import "math"

// rootTolerance is how near a turning point is found: within 1e-10 of ln x.
const rootTolerance = 1e-10

// bracket holds a change between two places: low < high, with the values of a
// function that changes sign there, NaN where none is known.
//
// The next place to look at is where the chord between the two values crosses
// zero, set off by a little towards the end that is further away, so that the
// bracket closes from both sides: where the function is a power law, of which
// places and values are logarithms, two looks are enough. Which side a place
// belongs to is not for the function to say but for who looks there; every
// third look that has not shrunk the bracket to a tenth is a halving, so that
// jumps are found too.
type bracket struct {
	low, high         float64
	atLow, atHigh     float64
	looks             int
	width             float64 // three looks ago
	keptLow, keptHigh int     // how often an end stayed in place
}

func newBracket(low, high, atLow, atHigh float64) *bracket {
	return &bracket{low: low, high: high, atLow: atLow, atHigh: atHigh, width: math.Inf(1)}
}

// next is the place to look at.
func (b *bracket) next() float64 {
	middle := b.low + (b.high-b.low)/2
	if b.looks++; b.looks%3 == 0 {
		slow := b.high-b.low > b.width/10
		b.width = b.high - b.low
		if slow {
			return middle
		}
	}
	fl, fh := b.atLow, b.atHigh
	if !(fl*fh <= 0) || fl == fh || math.IsInf(fl-fh, 0) { // the same sign, or no number
		return middle
	}
	if b.keptLow > 1 { // Illinois: an end that stays counts half
		fl *= math.Ldexp(1, 1-b.keptLow)
	}
	if b.keptHigh > 1 {
		fh *= math.Ldexp(1, 1-b.keptHigh)
	}
	x := b.low + (b.high-b.low)*(fl/(fl-fh))
	off := 0.4 * rootTolerance
	if b.high-x > x-b.low {
		x += off
	} else {
		x -= off
	}
	return math.Min(math.Max(x, b.low+off), b.high-off)
}

// lower moves the lower end up.
func (b *bracket) lower(x, value float64) {
	b.low, b.atLow = x, value
	b.keptLow, b.keptHigh = 0, b.keptHigh+1
}

// upper moves the upper end down.
func (b *bracket) upper(x, value float64) {
	b.high, b.atHigh = x, value
	b.keptLow, b.keptHigh = b.keptLow+1, 0
}
