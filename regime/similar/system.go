package similar

import (
	"math"
	"math/big"
	"slices"
)

// source says where an equation between factors comes from.
type source uint8

const (
	bySame   source = iota // a property that stays as it is
	byFluids               // the properties of the two fluids
	byGiven                // a factor that the caller gave
	byKeep                 // a group that is to be kept
	byRule                 // what is assumed where nothing else decides
)

// equation says that a product of factors equals a product of given values:
// left·x = right·σ, in logarithms.
type equation struct {
	left, right Powers
	from        source
	factor      Factor // of a single factor that is fixed
	keep        int    // index of a kept group
}

// fixed is the equation of a factor whose value is known.
func fixed(f Factor, from source, value float64) equation {
	e := equation{left: product(to(f, 1)), from: from, factor: f}
	if value != 1 {
		e.right = product(to(f, 1))
	}
	return e
}

// row is an equation solved for one factor.
type row struct {
	pivot       Factor
	left, right Powers
	made        combination
}

// combination is how a row came about: multiples of equations, by their index.
type combination map[int]*big.Rat

func (c combination) plus(other combination, times *big.Rat) combination {
	sum := combination{}
	for i, x := range c {
		sum[i] = x
	}
	for i, x := range other {
		y := new(big.Rat).Mul(x, times)
		if old := sum[i]; old != nil {
			y.Add(y, old)
		}
		if y.Sign() == 0 {
			delete(sum, i)
			continue
		}
		sum[i] = y
	}
	return sum
}

// system is a set of equations in reduced row echelon form, of which none
// contradicts another.
type system struct {
	equations []equation
	rows      []row
	values    [FactorCount]float64 // of the given factors; 1 for the others
}

// relation is what an equation turned out to be to those before it.
type relation uint8

const (
	independent relation = iota // it settles something
	implied                     // it follows from those before
	near                        // it follows within the tolerance
	contradicts                 // it excludes those before
)

// circuit is a set of equations of which none can be left out for the others to
// be dependent: the smallest set that excludes each other.
type circuit struct {
	made combination
	rest Powers // the product of given values that would have to be 1
}

// indexes lists the equations in their order.
func (c *circuit) indexes() []int {
	var list []int
	for i := range c.made {
		list = append(list, i)
	}
	slices.Sort(list)
	return list
}

// deviation is the factor by which one equation fails where all others of the
// circuit hold.
func (c *circuit) deviation(i int) Powers {
	return c.rest.times(new(big.Rat).Neg(new(big.Rat).Inv(c.made[i])))
}

// add takes an equation into the system, unless it contradicts what is there.
// Within the tolerance, a relative difference, it counts as following from it.
func (s *system) add(e equation, tolerance float64) (relation, *circuit) {
	index := len(s.equations)
	s.equations = append(s.equations, e)
	r := row{left: e.left, right: e.right, made: combination{index: big.NewRat(1, 1)}}
	for i := range s.rows {
		r = r.less(&s.rows[i])
	}
	for f := range FactorCount {
		if r.left.uses(f) {
			s.settle(r, f)
			return independent, nil
		}
	}
	c := &circuit{made: r.made, rest: r.right}
	switch d := math.Abs(math.Log(c.deviation(index).value(&s.values))); {
	case c.rest.IsOne() || d <= exact*c.size(s):
		return implied, nil
	case d <= math.Log1p(tolerance):
		return near, c
	default:
		return contradicts, c
	}
}

// exact is the relative difference that rounding makes of equal numbers.
const exact = 1e-12

// size is the sum of the logarithms whose difference the rest is.
func (c *circuit) size(s *system) float64 {
	sum := 1.0
	for f := range FactorCount {
		if c.rest.uses(f) {
			e, _ := c.rest.at(f).Float64()
			sum += math.Abs(e * math.Log(s.values[f]))
		}
	}
	return sum
}

// less takes out of a row the factor that another one is solved for.
func (r row) less(by *row) row {
	if !r.left.uses(by.pivot) {
		return r
	}
	minus := new(big.Rat).Neg(r.left.at(by.pivot))
	return row{pivot: r.pivot, left: r.left.plus(by.left.times(minus)), right: r.right.plus(by.right.times(minus)), made: r.made.plus(by.made, minus)}
}

// settle solves a row for a factor and takes that factor out of the others.
func (s *system) settle(r row, f Factor) {
	c := new(big.Rat).Inv(r.left.at(f))
	solved := row{pivot: f, left: r.left.times(c), right: r.right.times(c), made: combination{}.plus(r.made, c)}
	for i := range s.rows {
		s.rows[i] = s.rows[i].less(&solved)
	}
	s.rows = append(s.rows, solved)
}

// solution returns a factor as a product of given ones, and whether it is
// settled.
func (s *system) solution(f Factor) (Powers, bool) {
	for i := range s.rows {
		if r := &s.rows[i]; r.pivot == f {
			return r.right, r.alone()
		}
	}
	return Powers{}, false
}

// alone reports whether a row is solved: no other factor is in it.
func (r *row) alone() bool {
	for f := range FactorCount {
		if f != r.pivot && r.left.uses(f) {
			return false
		}
	}
	return true
}
