package similar

import (
	"math"
	"math/big"
	"strconv"
	"strings"
)

// Factor is an independent scale factor: a quantity of the model over the same
// one of the prototype. The list is append-only.
type Factor uint8

// The independent factors.
const (
	Length Factor = iota
	Speed
	Time
	FluidDensity
	KinematicViscosity
	SoundSpeed
	SurfaceTension
	Gravity
	StaticPressure
	YoungModulus
	SolidDensity
	HeatCapacityRatio

	FactorCount // number of factors
)

// FactorDef says what a factor is.
type FactorDef struct {
	ID     string
	Symbol string
	Title  string
	fluid  bool // a property of the fluid
	fixed  bool // cannot be given: it comes with the fluids
}

var factorTable = [FactorCount]FactorDef{
	Length:             {ID: "length", Symbol: "λ", Title: "length"},
	Speed:              {ID: "speed", Symbol: "λ_U", Title: "speed of the flow"},
	Time:               {ID: "time", Symbol: "λ_T", Title: "time of what drives or excites: waves, a closure"},
	FluidDensity:       {ID: "fluid_density", Symbol: "λ_ρ", Title: "density of the fluid", fluid: true},
	KinematicViscosity: {ID: "kinematic_viscosity", Symbol: "λ_ν", Title: "kinematic viscosity", fluid: true},
	SoundSpeed:         {ID: "sound_speed", Symbol: "λ_c", Title: "speed of sound", fluid: true},
	SurfaceTension:     {ID: "surface_tension", Symbol: "λ_γ", Title: "surface tension", fluid: true},
	Gravity:            {ID: "gravity", Symbol: "λ_g", Title: "gravity"},
	StaticPressure:     {ID: "static_pressure", Symbol: "λ_p", Title: "static pressure above that of the vapour, of a gas the pressure"},
	YoungModulus:       {ID: "young_modulus", Symbol: "λ_E", Title: "Young's modulus, or stiffness over length"},
	SolidDensity:       {ID: "solid_density", Symbol: "λ_s", Title: "density of the structure"},
	HeatCapacityRatio:  {ID: "heat_capacity_ratio", Symbol: "λ_κ", Title: "ratio of specific heats", fluid: true, fixed: true},
}

// FactorOf returns the definition of a factor.
func FactorOf(f Factor) *FactorDef { return &factorTable[f] }

// FindFactor returns the factor of that name that a caller may give.
func FindFactor(name string) (Factor, bool) {
	for f := range FactorCount {
		if factorTable[f].ID == name && !factorTable[f].fixed {
			return f, true
		}
	}
	return 0, false
}

// FactorNames lists the factors that a caller may give.
func FactorNames() []string { return names(func(d *FactorDef) bool { return !d.fixed }) }

// FreeNames lists what a caller may leave free that is otherwise unchanged;
// "fluid" stands for all properties of it.
func FreeNames() []string {
	free := names(func(d *FactorDef) bool { return canBeFree(d) })
	return append([]string{"fluid"}, free...)
}

func canBeFree(d *FactorDef) bool {
	return d.fluid && !d.fixed || d == &factorTable[Gravity]
}

func names(keep func(*FactorDef) bool) []string {
	var list []string
	for f := range FactorCount {
		if keep(&factorTable[f]) {
			list = append(list, factorTable[f].ID)
		}
	}
	return list
}

// Powers are exponents of the factors: a product of powers of them. An exponent
// of zero is nil, and none is ever changed in place.
type Powers [FactorCount]*big.Rat

// term is one factor of a product, with its exponent in halves.
type term struct {
	f      Factor
	halves int64
}

// to is a factor to a whole power.
func to(f Factor, n int64) term { return term{f, 2 * n} }

// root is the square root of a factor to a whole power.
func root(f Factor, n int64) term { return term{f, n} }

// product makes powers of terms.
func product(terms ...term) Powers {
	var p Powers
	for _, t := range terms {
		p = p.plus(unitPower(t.f, big.NewRat(t.halves, 2)))
	}
	return p
}

func unitPower(f Factor, e *big.Rat) Powers {
	var p Powers
	p[f] = orNil(e)
	return p
}

// at returns an exponent, never nil.
func (p *Powers) at(f Factor) *big.Rat {
	if p[f] == nil {
		return new(big.Rat)
	}
	return p[f]
}

// plus is the product of two products of powers.
func (p Powers) plus(q Powers) Powers {
	for f := range FactorCount {
		switch {
		case q[f] == nil:
		case p[f] == nil:
			p[f] = q[f]
		default:
			p[f] = orNil(new(big.Rat).Add(p[f], q[f]))
		}
	}
	return p
}

// times is the product to a power.
func (p Powers) times(c *big.Rat) Powers {
	for f := range FactorCount {
		if p[f] != nil {
			p[f] = orNil(new(big.Rat).Mul(p[f], c))
		}
	}
	return p
}

// orNil is an exponent, nil for zero.
func orNil(x *big.Rat) *big.Rat {
	if x.Sign() == 0 {
		return nil
	}
	return x
}

// IsOne reports whether no exponent is left: the product is 1 whatever the
// factors are.
func (p Powers) IsOne() bool { return p == Powers{} }

// uses reports whether a factor has an exponent.
func (p Powers) uses(f Factor) bool { return p[f] != nil }

// Exponent is an exponent in its lowest terms, "3/2" or "-1"; "0" where there is
// none.
func (p Powers) Exponent(f Factor) string { return p.at(f).RatString() }

// value is the product at values of the factors.
func (p Powers) value(x *[FactorCount]float64) float64 {
	v := 1.0
	for f := range FactorCount {
		if p[f] == nil {
			continue
		}
		e, _ := p[f].Float64()
		v *= math.Pow(x[f], e)
	}
	return v
}

// Formula writes the product as people do: "λ^(3/2) λ_g^-1"; "1" for none.
func (p Powers) Formula() string {
	var parts []string
	for f := range FactorCount {
		e := p[f]
		if e == nil {
			continue
		}
		s := factorTable[f].Symbol
		switch {
		case e.IsInt() && e.Num().IsInt64() && e.Num().Int64() == 1:
		case e.IsInt():
			s += "^" + e.RatString()
		default:
			s += "^(" + e.RatString() + ")"
		}
		parts = append(parts, s)
	}
	if parts == nil {
		return "1"
	}
	return strings.Join(parts, " ")
}

// ParseRatio reads a scale: "1:40", "1/40" or "0.025", a number above zero.
func ParseRatio(text string) (float64, bool) {
	text = strings.TrimSpace(text)
	for _, mark := range []string{":", "/"} {
		if left, right, cut := strings.Cut(text, mark); cut {
			a, good := positive(left)
			b, fine := positive(right)
			x := a / b
			return x, good && fine && representable(x)
		}
	}
	return positive(text)
}

func positive(text string) (float64, bool) {
	x, err := strconv.ParseFloat(strings.TrimSpace(text), 64)
	return x, err == nil && representable(x)
}

// representable says whether a factor can be computed with: far enough from the
// ends of what a double holds for a product of them.
func representable(x float64) bool { return x >= 1e-30 && x <= 1e30 }
