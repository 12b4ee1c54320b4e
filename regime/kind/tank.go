package kind

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// The fields of a tank.
var (
	tankShape      = choice("shape", "plan of the tank", "cylindrical where a diameter is given, else rectangular", "rectangular", "cylindrical")
	tankLength     = quantity("length", units.Length, "gt=0", "inner length of a rectangular tank along the motion", "")
	tankWidth      = quantity("width", units.Length, "gt=0", "inner width of a rectangular tank across the motion", "the length")
	tankDiameter   = quantity("diameter", units.Length, "gt=0", "inner diameter of an upright cylindrical tank", "")
	tankRadius     = quantity("radius", units.Length, "gt=0", "inner radius, in place of the diameter", "")
	tankLiquid     = quantity("liquid_depth", units.Length, "gt=0", "depth of the liquid", "")
	tankHeight     = quantity("height", units.Length, "gt=0", "height of the wall", "the depth of the liquid and the freeboard")
	tankWall       = quantity("wall_thickness", units.Length, "gt=0", "thickness of the wall, the mean of its courses", "")
	tankFreeboard  = quantity("freeboard", units.Length, "gt=0", "height of the roof or the rim above the liquid", "from the height of the wall; else no roof")
	tankBase       = quantity("base_acceleration", units.Acceleration, "gt=0", "amplitude of the acceleration of a harmonic lateral motion of the base", "(2πf)² times the amplitude of the motion")
	tankConvective = quantity("spectral_acceleration", units.Acceleration, "gt=0", "spectral acceleration of an earthquake at the first sloshing period and damping", "no earthquake")
	tankDamping    = pure("sloshing_damping", "gt=0,lt=1", "damping ratio of the first sloshing mode, with baffles", "of the Stokes layers on walls and bottom")
)

// Tank is a container with a free liquid surface.
var Tank = &Kind{
	Name:  "tank",
	Title: "Tank",
	Doc:   "rectangular or upright cylindrical tank, partly filled, under a lateral motion or an earthquake",
	Fields: modal(elastic(tankShape, tankLength, tankWidth, tankDiameter, tankRadius, tankLiquid, tankHeight, tankWall, tankFreeboard,
		tankBase, tankConvective, tankDamping)...),
	Surface: true,
	New:     newTank,
}

// tank holds the solved problems of one tank.
type tank struct {
	upright   bool
	l         float64 // length along the motion, or diameter
	b         float64 // width across it
	h         float64 // liquid depth
	height    float64 // of the wall, NaN where not known
	wall      float64
	freeboard float64
	unit      float64 // length of the sloshing solution: L or R
	mass      float64 // of the liquid
	first     float64 // convective share of the first mode
	rigid     float64 // impulsive share
	zeta      float64 // damping of the first sloshing mode
}

func newTank(r *Resolver) Physics {
	t := &tank{height: math.NaN(), freeboard: math.NaN(), zeta: math.NaN(), first: math.NaN(), rigid: math.NaN()}
	if !t.size(r) {
		return t
	}
	if r.Is(group.Gas) {
		r.contradict(FluidPhase, "A tank holds a liquid, and the fluid is a gas.")
		return t
	}
	if r.Is(group.Fluid) {
		r.trait(group.Sloshing | group.Contained | group.NearSurface)
		r.Traits &^= group.Still // what it holds moves
	}
	r.liquid()
	r.unused(WallGap, ShellDiameter, DepthBelowSurface, BackingDepth)
	if t.upright {
		r.trait(group.Circular)
	}
	t.slosh(r)
	r.closeGroups()
	r.damping()
	r.material()
	t.masses(r)
	r.frequencies(t.bulging(r))
	t.needWall(r)
	t.excite(r)
	r.interestOf()
	return t
}

// size takes plan, liquid and wall.
func (t *tank) size(r *Resolver) bool {
	d, radius := r.c.X(tankDiameter), r.c.X(tankRadius)
	if math.IsNaN(d) {
		d = 2 * radius
	} else if !math.IsNaN(radius) && math.Abs(2*radius/d-1) > 1e-3 {
		r.contradict(tankRadius, "The radius is not half the diameter.")
	}
	otherwise := "rectangular"
	if !math.IsNaN(d) {
		otherwise = "cylindrical"
	}
	t.upright = r.c.Choice(tankShape, otherwise) == "cylindrical"
	t.l, t.b = d, d
	t.unit = d / 2
	if !t.upright {
		t.l, t.b = r.c.X(tankLength), r.c.X(tankWidth)
		if math.IsNaN(t.b) && !math.IsNaN(t.l) {
			t.b = t.l
			r.warn(tankWidth, "assumed", "The tank is taken as wide as it is long.")
		}
		t.unit = t.l
	}
	t.h = r.c.X(tankLiquid)
	switch {
	case math.IsNaN(t.l) && t.upright:
		r.violations.Add(tankDiameter.Pointer(), input.MissingField, "A cylindrical tank needs a diameter (or a radius).", nil)
		return false
	case math.IsNaN(t.l):
		r.violations.Add(tankLength.Pointer(), input.MissingField, "A rectangular tank needs its length along the motion.", nil)
		return false
	case math.IsNaN(t.h):
		r.violations.Add(tankLiquid.Pointer(), input.MissingField, "A tank needs the depth of its liquid.", nil)
		return false
	}
	return t.walls(r)
}

func (t *tank) walls(r *Resolver) bool {
	t.height, t.wall, t.freeboard = r.c.X(tankHeight), r.c.X(tankWall), r.c.X(tankFreeboard)
	if t.height < t.h*(1-1e-9) {
		r.contradict(tankLiquid, "The liquid is deeper than the wall is high.")
		return false
	}
	if t.wall > t.b/2 || t.wall > t.l/2 {
		r.contradict(tankWall, "The wall is thicker than half the tank is wide.")
		return false
	}
	if math.IsNaN(t.freeboard) && t.height > t.h*(1+1e-9) {
		t.freeboard = t.height - t.h
	}
	if math.IsNaN(t.height) {
		t.height = t.h
		if !math.IsNaN(t.freeboard) {
			t.height += t.freeboard
		}
	}
	what := "the length along the motion"
	if t.upright {
		what = "the inner diameter"
	}
	r.Put(scale.Length, t.l, units.Length, scale.Given, what)
	r.Put(scale.Depth, t.h, units.Length, scale.Given, "the depth of the liquid")
	r.derive(scale.ViscousLength, t.unit/map[bool]float64{true: 1, false: 2}[t.upright], units.Length, "the radius, or half the length")
	r.take(scale.Thickness, tankWall)
	if !math.IsNaN(t.freeboard) {
		r.derive(scale.AirGap, t.freeboard, units.Length, "the freeboard")
	}
	return true
}

// slosh solves the first and the third sloshing mode.
func (t *tank) slosh(r *Resolver) {
	solve := canon.RectangularTank
	if t.upright {
		solve = canon.UprightTank
	}
	depth := math.Max(1e-4, math.Min(t.h/t.unit, 1e4))
	unit := math.Sqrt(r.X(scale.Gravity)/t.unit) / (2 * math.Pi)
	first, share, err := solve(1, depth)
	if err != nil {
		return
	}
	t.first = share
	third, _, _ := solve(3, depth)
	r.derive(scale.FrequencySlosh, first*unit, units.Frequency, "first mode of linear sloshing")
	r.derive(scale.FrequencySloshThird, third*unit, units.Frequency, "third mode of linear sloshing")
	_, t.rigid, _ = canon.SloshingMassFraction(t.upright, 50, depth)
	if t.zeta = r.c.X(tankDamping); math.IsNaN(t.zeta) {
		layer := math.Sqrt(r.X(scale.KinematicViscosity) / (math.Pi * r.X(scale.FrequencySlosh)))
		t.zeta = layer * t.layerDamping()
	}
}

// layerDamping is the damping ratio of the first sloshing mode over the depth of
// the Stokes layer.
//
//	ζ = (δ/4) ∫|∇φ|² dS/∫|∇φ|² dV: the loss in the layers on walls and bottom, ½ρδωU²/2
//	per area, over 2ω times the energy of the potential flow
//
// Symbols: δ = √(2ν/ω) depth of the layer [m], φ potential of the mode; rectangle:
// cos kx cosh k(z + h), k = π/L, width B; circle: J₁(kr) cos θ cosh k(z + h), k = ε₁/R.
// The result in 1/m. Range: δ far below h and L. Accuracy: exact for layers on clean
// walls; measured damping lies up to 1.4 times higher.
// Check: deep circular tank: 0.557 √ν/(R^¾ g^¼), measured 0.79 (Abramson 1966).
// Source: Keulegan 1959, Landau & Lifshitz §24, from memory.
func (t *tank) layerDamping() float64 {
	k := math.Pi / t.l
	if t.upright {
		k = uprightRoot / t.unit
	}
	kh := k * t.h
	// over sinh 2kh/(4k): the integrals of cosh² and sinh² over the depth, and
	// of 1, are 1 + c, 1 − c and c·2 at the bottom
	c := 2 * kh / math.Sinh(2*kh)
	bottom := 4 * k / math.Sinh(2*kh)
	if kh > 300 {
		c, bottom = 0, 0
	}
	if t.upright {
		e2 := uprightRoot * uprightRoot
		wall := ((1 + c) + e2*(1-c)) / t.unit
		floor := (e2 - 1) / 2 * bottom
		return (wall + floor) / (4 * (e2 - 1))
	}
	ends := 2 * (1 - c)
	sides := 2 * t.l / t.b // of both: cosh² and sinh² add up to 2
	floor := t.l / 2 * bottom
	return (ends + sides + floor) / (4 * t.l)
}

// First root of J₁′.
const uprightRoot = 1.8411837813406593

// masses resolves the mass of the wall, of the liquid, and of what moves with the
// wall.
func (t *tank) masses(r *Resolver) {
	rho, plan, girth := r.X(scale.Density), t.l*t.b, 2*(t.l+t.b)
	if t.upright {
		plan, girth = math.Pi*t.l*t.l/4, math.Pi*t.l
	}
	t.mass = rho * plan * t.h
	r.derive(scale.DisplacedMass, t.mass, units.Mass, "the liquid")
	r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	r.Value(scale.DryMass).Kind = units.Mass
	if !r.Has(scale.DryMass) {
		r.derive(scale.DryMass, r.X(scale.SolidDensity)*t.wall*girth*t.height, units.Mass, "ρ_s times the wall")
	}
	switch {
	case math.IsNaN(t.wall):
		r.Need(scale.DryMass, tankWall.Path())
	default:
		r.Need(scale.DryMass, r.Needs(scale.SolidDensity))
	}
	how := "the impulsive share of the liquid, which moves with the walls"
	r.derive(scale.AddedMass, t.rigid*t.mass, units.Mass, how)
	r.derive(scale.AddedMassFree, t.rigid*t.mass, units.Mass, how)
	r.addedNeeds(units.Mass)
}

// impulsiveTable is C_i of the bulging of an anchored upright tank of steel against
// H/R (Malhotra et al. 2000; EN 1998-4, table A.2, from memory).
var impulsiveTable = [][2]float64{{0.3, 9.28}, {0.5, 7.74}, {0.7, 6.97}, {1, 6.36}, {1.5, 6.06}, {2, 6.21}, {2.5, 6.56}, {3, 7.03}}

// impulsiveCoefficient is C_i, by the line through its table; beyond its ends the
// value there times the square root of the ratio or the ratio, since a shallow
// wall is a shell of its own and a tall one a beam.
func impulsiveCoefficient(depth float64) float64 {
	first, last := impulsiveTable[0], impulsiveTable[len(impulsiveTable)-1]
	switch {
	case depth <= first[0]:
		return first[1] * math.Sqrt(first[0]/depth)
	case depth >= last[0]:
		return last[1] * depth / last[0]
	}
	for i := 1; i < len(impulsiveTable); i++ {
		if lo, hi := impulsiveTable[i-1], impulsiveTable[i]; depth <= hi[0] {
			return lo[1] + (hi[1]-lo[1])*(depth-lo[0])/(hi[0]-lo[0])
		}
	}
	return last[1]
}

// bulging is the dry frequency that belongs to the bulging of the wall with
// liquid: of an upright tank 1/(C_i H √(ρ/E)/√(s/R)), the wet one, and so times
// √(1 + μ); of a rectangular one that of the wall across the motion as a plate,
// clamped at the bottom and the sides.
func (t *tank) bulging(r *Resolver) (float64, string, func(float64) float64) {
	e, rho := r.X(scale.Young), r.X(scale.Density)
	if math.IsNaN(e) || math.IsNaN(t.wall) {
		return math.NaN(), "", nil
	}
	if t.upright {
		period := impulsiveCoefficient(t.h/t.unit) * t.h * math.Sqrt(rho/e) / math.Sqrt(t.wall/t.unit)
		mu := r.X(scale.AddedMass) / r.X(scale.DryMass)
		return math.Sqrt(1+mu) / period, "√(1 + μ) over the impulsive period C_i H √(ρ/E)/√(s/R)", nil
	}
	nu := r.X(scale.Poisson)
	omega2 := clampedWall(t.b, t.height, nu) * e * t.wall * t.wall / (12 * (1 - nu*nu) * r.X(scale.SolidDensity))
	return math.Sqrt(omega2) / (2 * math.Pi), "the wall across the motion as a plate, clamped but at the rim", nil
}

// clampedWall is ω²ρ_s h/D of the first mode of a rectangular plate that is clamped
// at the bottom and both sides and free at the rim, by Rayleigh's quotient with
// beam functions.
//
//	π⁴ (G_x⁴/b⁴ + G_y⁴/H⁴ + 2(ν H_x H_y + (1 − ν) J_x J_y)/(b²H²))
//
// Symbols: b width, H height [m]; G_x 1.506, H_x = J_x 1.248 clamped-clamped; G_y 0.597,
// H_y −0.0870, J_y 0.471 clamped-free. Range: any ratio. Accuracy: an upper bound,
// within 4 % of frequency. Check: square, ν = 0.3: λ² = 24.3, Ritz 24.0.
// Source: Warburton 1954; Leissa 1969, table of coefficients, from memory.
func clampedWall(b, height, nu float64) float64 {
	x, y := math.Pow(1.506/b, 2), math.Pow(0.597/height, 2)
	cross := 2 * (nu*1.248*-0.0870 + (1-nu)*1.248*0.471) / (b * b * height * height)
	return math.Pow(math.Pi, 4) * (x*x + y*y + cross)
}

// needWall records what the frequency of the wall waits for.
func (t *tank) needWall(r *Resolver) {
	need := FrequencyDry.Path()
	if math.IsNaN(t.wall) {
		need = tankWall.Path()
	} else {
		for _, id := range []scale.ID{scale.Density, scale.SolidDensity, scale.Young} {
			if !r.Has(id) && r.Needs(id) != "" {
				need = r.Needs(id)
			}
		}
	}
	for _, id := range []scale.ID{scale.FrequencyDry, scale.FrequencyWet} {
		if r.Needs(id) != "" {
			r.Need(id, need)
		}
	}
}

// wallHeight is the wave amplitude at the wall over L (a rectangle) or R, over the
// acceleration in g, that of the first mode in resonance with itself: 4/π² and
// 2/(ε₁² − 1).
func (t *tank) wallHeight() float64 {
	if t.upright {
		return 2 / (uprightRoot*uprightRoot - 1) * t.unit
	}
	return 4 / (math.Pi * math.Pi) * t.unit
}

// excite takes the motion of the base, harmonic or an earthquake, and finds the
// wave at the wall.
func (t *tank) excite(r *Resolver) {
	f, f1, g := r.c.X(MotionFrequency), r.X(scale.FrequencySlosh), r.X(scale.Gravity)
	omega := 2 * math.Pi * f
	if !math.IsNaN(f) {
		r.Put(scale.FrequencyExcitation, f, units.Frequency, scale.Given, "")
	} else if f1 > 0 {
		r.derive(scale.FrequencyMotion, f1, units.Frequency, "the first sloshing mode")
	}
	r.Need(scale.FrequencyExcitation, MotionFrequency.Path())
	r.Value(scale.FrequencyExcitation).Kind = units.Frequency
	r.Value(scale.SloshingHeight).Kind = units.Length
	if r.take(scale.BaseAcceleration, tankConvective) {
		r.trait(group.Spectrum)
		if r.c.Has(tankBase) || r.c.Has(MotionFrequency) {
			r.contradict(tankConvective, "An earthquake's spectral acceleration and a harmonic motion are two cases; give one of them.")
		}
		r.derive(scale.SloshingHeight, t.wallHeight()*r.X(scale.BaseAcceleration)/g, units.Length, "first mode under the spectral acceleration")
		if !r.c.Has(MotionAmplitude) {
			r.derive(scale.Amplitude, r.X(scale.BaseAcceleration)/math.Pow(2*math.Pi*f1, 2), units.Length, "spectral displacement of the first sloshing mode")
		}
		return
	}
	switch x := r.c.X(MotionAmplitude); {
	case r.take(scale.BaseAcceleration, tankBase):
		if a := omega * omega * x; math.Abs(a/r.X(scale.BaseAcceleration)-1) > 0.02 {
			r.contradict(tankBase, "The acceleration of the base is not (2πf)² times the amplitude of the motion.")
		}
		if math.IsNaN(x) {
			r.derive(scale.Amplitude, r.X(scale.BaseAcceleration)/(omega*omega), units.Length, "A/(2πf)²")
		}
	default:
		r.derive(scale.BaseAcceleration, omega*omega*x, units.Acceleration, "(2πf)² times the amplitude")
		r.Value(scale.BaseAcceleration).Kind = units.Acceleration
	}
	ratio := f / f1
	magnified := 1 / math.Hypot(1-ratio*ratio, 2*t.zeta*ratio)
	r.derive(scale.SloshingHeight, t.wallHeight()*r.X(scale.BaseAcceleration)/g*magnified, units.Length, "first mode under the acceleration of the base, magnified by its damping")
	switch {
	case math.IsNaN(f):
		r.Need(scale.SloshingHeight, MotionFrequency.Path())
	case !r.Has(scale.BaseAcceleration):
		r.Need(scale.SloshingHeight, tankBase.Path())
	default:
		r.Need(scale.SloshingHeight, r.Needs(scale.KinematicViscosity))
	}
}

// Groups puts the groups that are the tank's own.
func (t *tank) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.5, Viscous: 1.5, Acoustic: 2, Flow: 1, Buckling: 1, Flutter: 1, StallPerRadian: 1}
	g.Band = group.Transition{Low: 3e5, High: 3e6, Length: group.Reynolds}
	if !g.Is(group.Fluid) {
		return
	}
	g.Put(group.ConvectiveMass, t.first)
	g.Put(group.ImpulsiveMass, t.rigid)
	g.Put(group.FillRatio, t.h/t.l)
	putOrWait(s, g, group.SloshingDamping, t.zeta, scale.KinematicViscosity)
	putOrWait(s, g, group.BulgingRatio, s.X(scale.FrequencySlosh)/s.X(scale.FrequencyWet), scale.FrequencyWet, scale.FrequencyDry)
	linear := math.Min(0.1*t.h, 0.05*t.l)
	putOrWait(s, g, group.SloshingAmplitude, s.X(scale.SloshingHeight)/linear, scale.SloshingHeight)
	if !g.Is(group.Spectrum) {
		putOrWait(s, g, group.SloshingRatio, s.X(scale.FrequencyExcitation)/s.X(scale.FrequencySlosh), scale.FrequencyExcitation)
		putOrWait(s, g, group.SloshingRatioThird, s.X(scale.FrequencyExcitation)/s.X(scale.FrequencySloshThird), scale.FrequencyExcitation)
	}
	if s.Has(scale.AirGap) {
		putOrWait(s, g, group.CrestClearance, s.X(scale.SloshingHeight)/s.X(scale.AirGap), scale.SloshingHeight)
		if v := 2 * math.Pi * s.X(scale.FrequencySlosh) * s.X(scale.SloshingHeight); v > 0 {
			putOrWait(s, g, group.SlammingTime, 13*t.l*s.X(scale.FrequencyWet)/(64*v), scale.FrequencyWet)
		}
	}
	for _, id := range []group.ID{group.DisplacementDepth, group.Knudsen} {
		g.Drop(id)
	}
	t.sound(s, g)
	if speed := 2 * math.Pi * s.X(scale.FrequencySlosh) * s.X(scale.SloshingHeight); speed > 0 {
		putOrWait(s, g, group.Reynolds, speed*t.l/s.X(scale.KinematicViscosity), scale.KinematicViscosity)
	}
}

// sound puts the factor of a compressible liquid: a layer of depth h with a free
// surface stands as a quarter wave, and below that moves 1/(1 − (f/f_a)²) of its
// mass, f_a = c/(4h). An earthquake reaches the frequency of the wall; another
// motion has its own.
func (t *tank) sound(s *scale.Set, g *group.Set) {
	f := scale.FrequencyMotion
	if g.Is(group.Spectrum) {
		f = scale.FrequencyWet
	}
	x := 4 * t.h * s.X(f) / s.X(scale.SoundSpeed)
	if math.IsNaN(x) {
		waitFor(s, g, []scale.ID{f, scale.SoundSpeed}, group.AcousticInertia)
		return
	}
	g.Put(group.AcousticInertia, 1/math.Max(1-x*x, 0.05))
}
