package canon

import "math"

// discShape is a mode shape of a circular plate of radius 1 in Zernike's radial
// polynomials, W(r) = Σ cⱼ R_p−1(r) with p = s + 2j + 1. They turn the Hankel
// transform into Bessel functions, ∫R J_s(kr) r dr = (−1)ʲ J_p(k)/k.
type discShape struct {
	diameters      int
	c              []float64
	square         float64 // ∫W² r dr = Σ cⱼ²/(2p)
	slope, bending float64 // W′ and W″ at r = 1
}

// newDiscShape expands a shape. Mode shapes are entire functions, so that the
// coefficients fall faster than any power once 2j exceeds λ.
func newDiscShape(w func(r float64) float64, diameters, terms int) discShape {
	d := discShape{diameters: diameters, c: make([]float64, terms)}
	rule := legendreRuleFor(terms + 12 + diameters/2)
	for i, r := range rule.x {
		value := rule.w[i] * r * w(r) * math.Pow(r, float64(diameters))
		for j := range d.c {
			d.c[j] += 2 * float64(d.order(j)) * value * plateJacobi(j, 0, diameters, 2*r*r-1)
		}
	}
	for j, c := range d.c {
		d.square += c * c / (2 * float64(d.order(j)))
	}
	return d
}

func (d *discShape) order(j int) int { return d.diameters + 2*j + 1 }

// discModeShape is the mode shape for a root λ: J_s(λr) + C I_s(λr)/I_s(λ).
func discModeShape(edge CircularEdge, λ float64, diameters int, nu float64) discShape {
	return discModeShapeIn(14+int(0.75*λ), edge, λ, diameters, nu)
}

// discModeShapeIn expands the shape in so many polynomials.
func discModeShapeIn(terms int, edge CircularEdge, λ float64, diameters int, nu float64) discShape {
	j := math.Jn(diameters, λ)
	c := -j // no deflection at the edge
	if edge == CircularFree {
		mJ, mI, _, _ := freeDiscEdge(λ, diameters, nu)
		c = -mJ / mI
	}
	c /= discIScaled(diameters, λ)
	shape := newDiscShape(func(r float64) float64 {
		return math.Jn(diameters, λ*r) + c*math.Exp(λ*(r-1))*discIScaled(diameters, λ*r)
	}, diameters, terms)
	if edge != CircularFree {
		shape.slope = -λ * (math.Jn(diameters+1, λ) + j*discIRatio(diameters, λ))
	}
	if edge == CircularClamped {
		shape.slope, shape.bending = 0, -2*λ*λ*j
	}
	return shape
}

// addedMass is ∫H² dk/∫W² r dr, H the Hankel transform, with
// ∫J_p J_q/k² dk = 4(−1)^(j−l)/(π(1 − 4(j−l)²)((p+q)² − 1)) for p − q = 2(j−l).
func (d *discShape) addedMass() float64 {
	sum := 0.0
	for j, a := range d.c {
		for l, b := range d.c {
			apart := float64(j - l)
			orders := float64(d.order(j) + d.order(l))
			sum += a * b / ((1 - 4*apart*apart) * (orders*orders - 1))
		}
	}
	return 4 / math.Pi * sum / d.square
}

// discKey are the arguments of the functions on the loading of circular plates.
type discKey struct {
	edge               CircularEdge
	circles, diameters int
	nu, k0             float64
}

var discAddedMasses = newSolvedMemo[discKey, float64](1024)

// CircularPlateAddedMass returns the added mass coefficient of a circular plate
// in a rigid baffle, on one side, in an incompressible fluid.
//
// Equation: β = coefficient·ρa/(ρ_s h), coefficient = ∫₀^∞ H² dk/∫₀¹ W² r dr,
// H(k) = ∫₀¹ W J_s(kr) r dr, W the exact mode shape; f_wet/f_dry = 1/√(1 + β).
//
// Symbols: β added mass ratio of the mode, ρ fluid density [kg/m³], a radius [m],
// ρ_s plate density [kg/m³], h thickness [m]; edge, circles, diameters and ν as for
// CircularPlateMode. With fluid on both sides, twice the coefficient.
//
// Range: circles and diameters from 0 to 10; ν from 0 to 0.5; a free edge as if
// the gap to the baffle were closed.
//
// Accuracy: 1e-9 for the shape in vacuo, which the fluid hardly changes in the
// first mode.
//
// Check: clamped, first mode: 0.6689 by Lamb with the shape (1 − r²)²; the exact
// shape gives 0.6538; a piston 8/(3π) = 0.8488.
//
// Source: Lamb 1920; McLachlan 1932 (from memory).
func CircularPlateAddedMass(edge CircularEdge, circles, diameters int, nu float64) (float64, error) {
	if err := checkDisc("CircularPlateAddedMass", edge, circles, diameters, nu); err != nil {
		return 0, err
	}
	key := discKey{edge: edge, circles: circles, diameters: diameters, nu: nu}
	return discAddedMasses.of(key, func() float64 {
		shape := discModeShape(edge, discRoot(edge, circles, diameters, nu), diameters, nu)
		return shape.addedMass()
	}), nil
}

// discUncertainty is the relative change of the coefficient with half as many
// polynomials again.
func discUncertainty(edge CircularEdge, circles, diameters int, nu, coefficient float64) float64 {
	λ := discRoot(edge, circles, diameters, nu)
	more := discModeShapeIn(21+int(1.125*λ), edge, λ, diameters, nu)
	return math.Abs(more.addedMass()/coefficient-1) + 1e-15
}

// baffledDiscUncertainty is twice the change of either value, in units of ρa and
// ρc, with more polynomials, a longer integral and finer panels: the tail of the
// integral shortens by a power only.
func baffledDiscUncertainty(edge CircularEdge, circles, diameters int, nu, k0 float64, a baffledAnswer) float64 {
	λ := discRoot(edge, circles, diameters, nu)
	more := discModeShapeIn(21+int(1.125*λ), edge, λ, diameters, nu)
	if k0 < noSound {
		return 2*math.Abs(more.addedMass()-a.mass) + 1e-15
	}
	mass := math.Abs(more.baffledMass(k0, λ, 1.5) - a.mass)
	return 2*max(mass, math.Abs(more.baffledResistance(k0, 1.5)-a.resistance)) + 1e-15
}

// noSound is the k₀a below which the loading is that of an incompressible fluid
// to all digits, and the resistance is nothing.
const noSound = 1e-50

var baffledDiscs = newSolvedMemo[discKey, baffledAnswer](4096)

// BaffledCircularPlateMode returns the fluid loading of a mode of a circular plate
// in a rigid plane baffle, on one side.
//
// Equation: Z/∫W²dA = ρc·r̂ + iω·μ̂ρa, r̂ = k₀²∫H(k₀ sin θ)² sin θ dθ/∫W² r dr over 0 to
// π/2, μ̂ = ∫₀^∞ H(√(k₀² + t²))² dt/∫W² r dr, H(k) = ∫₀¹ W J_s(kr) r dr: the integral
// over k with the pole of 1/√(k² − k₀²) removed by k² = k₀² + t².
//
// Symbols: μ̂ added mass per area over ρa (added mass ratio μ̂ ρa/(ρ_s h)), r̂
// radiation resistance per area over ρc, ρ [kg/m³] and c [m/s] of the fluid, a
// radius [m], k₀ = ω/c [1/m]; the rest as for CircularPlateMode.
//
// Range: clamped or simply supported; circles and diameters from 0 to 10; ν from 0
// to 0.5; k0a from 0 to 60.
//
// Accuracy: 1e-7 of the loading of a piston (ρa or ρc).
//
// Check: k0a = 0: CircularPlateAddedMass; k0a ≫ λ: r̂ → 1.
//
// Source: McLachlan 1932; Lamb 1920 (from memory).
func BaffledCircularPlateMode(edge CircularEdge, circles, diameters int, nu, k0a float64) (mass, resistance float64, err error) {
	const name = "BaffledCircularPlateMode"
	if edge == CircularFree {
		return 0, 0, &RangeError{Function: name, Arg: "edge", Value: float64(edge), Reason: "want clamped or simply-supported"}
	}
	if err := checkDisc(name, edge, circles, diameters, nu); err != nil {
		return 0, 0, err
	}
	if err := inRange(name, "k0a", k0a, 0, 60); err != nil {
		return 0, 0, err
	}
	key := discKey{edge: edge, circles: circles, diameters: diameters, nu: nu, k0: k0a}
	a := baffledDiscs.of(key, func() baffledAnswer {
		λ := discRoot(edge, circles, diameters, nu)
		shape := discModeShape(edge, λ, diameters, nu)
		if k0a < noSound {
			return baffledAnswer{mass: shape.addedMass()}
		}
		return baffledAnswer{mass: shape.baffledMass(k0a, λ, 1), resistance: shape.baffledResistance(k0a, 1)}
	})
	return a.mass, a.resistance, nil
}

// baffledResistance is k₀²∫H(k₀ sin θ)² sin θ dθ/∫W² r dr.
func (d *discShape) baffledResistance(k0, refine float64) float64 {
	rule := legendreRuleFor(int(refine * (12 + 1.2*k0)))
	work := d.newHankelWork()
	sum := 0.0
	for i, u := range rule.x {
		sinθ := math.Sin(0.5 * math.Pi * u)
		h := d.hankel(k0*sinθ, work)
		sum += rule.w[i] * sinθ * h * h
	}
	return 0.5 * math.Pi * k0 * k0 * sum / d.square
}

// baffledMass integrates in panels of length 2 to k = k₀ + 2λ + 60 and adds the mean
// of the tail, H² ≈ W′²/(πk⁵) or, with a clamped edge, W″²/(πk⁷). refine above 1
// goes further, in more panels.
func (d *discShape) baffledMass(k0, λ, refine float64) float64 {
	end := k0 + 2*λ + 60*refine
	top := math.Sqrt(end*end - k0*k0)
	panels := int(math.Ceil(top / 2 * refine))
	width := top / float64(panels)
	rule := legendreRuleFor(12)
	work := d.newHankelWork()
	sum := 0.0
	for p := range panels {
		for i, u := range rule.x {
			t := (float64(p) + u) * width
			h := d.hankel(math.Sqrt(k0*k0+t*t), work)
			sum += width * rule.w[i] * h * h
		}
	}
	e2 := end * end
	tail := (d.slope*d.slope/4 + d.bending*d.bending/(6*e2)) / (math.Pi * e2 * e2)
	return (sum + tail) / d.square
}

// newHankelWork makes room for the Bessel functions of one argument.
func (d *discShape) newHankelWork() []float64 { return make([]float64, d.order(len(d.c)-1)+1) }

// hankel is H(k) = Σ cⱼ(−1)ʲ J_p(k)/k. Room for the Bessel functions is lent.
func (d *discShape) hankel(k float64, bessel []float64) float64 {
	discBesselTable(bessel, k)
	sum, sign := 0.0, 1.0
	for j, c := range d.c {
		sum += sign * c * bessel[d.order(j)]
		sign = -sign
	}
	return sum / k
}

// discBesselTable fills in J_0(x), J_1(x), … for x > 0 by recurrence downward from
// where they have died out, scaled by J_0 + 2J_2 + 2J_4 + … = 1.
func discBesselTable(table []float64, x float64) {
	if x < 1e-8 { // the first term of the series, exact to rounding
		table[0] = 1
		for k := 1; k < len(table); k++ {
			table[k] = table[k-1] * 0.5 * x / float64(k)
		}
		return
	}
	last := len(table) - 1
	top := max(last, int(x)) + 20 + int(8*math.Cbrt(x))
	top += top % 2
	after, now, norm := 0.0, 1e-300, 0.0
	for k := top; k >= 0; k-- {
		if k <= last {
			table[k] = now
		}
		if k%2 == 0 && k > 0 {
			norm += 2 * now
		}
		if k == 0 {
			norm += now
			break
		}
		after, now = now, 2*float64(k)/x*now-after
		if math.Abs(now) > 1e200 {
			discBesselRescale(table[min(k, last+1):], 1e-250)
			after, now, norm = after*1e-250, now*1e-250, norm*1e-250
		}
	}
	discBesselRescale(table, 1/norm)
}

func discBesselRescale(table []float64, factor float64) {
	for i := range table {
		table[i] *= factor
	}
}
