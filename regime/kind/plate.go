package kind

import (
	"fmt"
	"math"
	"math/cmplx"
	"strings"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// The fields of a plate.
var (
	plLength    = quantity("length", units.Length, "gt=0", "side of a rectangular plate along x, the way a flow runs over it", "")
	plWidth     = quantity("width", units.Length, "gt=0", "side of a rectangular plate along y", "")
	plRadius    = quantity("radius", units.Length, "gt=0", "radius of a circular plate, in place of length and width", "")
	plThickness = quantity("thickness", units.Length, "gt=0", "thickness", "")
	plMass      = quantity("mass_per_area", units.MassPerArea, "gt=0", "mass per area of the plate", "density times thickness")
	plBending   = quantity("bending_stiffness", units.BendingStiffnessPlate, "gt=0", "bending stiffness D", "Eh³/(12(1 − ν²))")
	plEdges     = choice("edges", "edges at x = 0, y = 0, x = length, y = width: S simply supported, C clamped, F free; a circular plate: simply-supported or clamped",
		"SSSS", plateEdges()...)
	plModeM   = whole("mode_m", "gte=1,lte=10", "half waves along the length; for a circular plate nodal circles plus one", "1")
	plModeN   = whole("mode_n", "gte=1,lte=10", "half waves along the width; for a circular plate nodal diameters plus one", "1")
	plSides   = whole("wetted_sides", "gte=1,lte=2", "sides that are wetted", "2")
	plBaffled = flag("baffled", "whether a rigid plane surrounds the plate", "true; false with a free edge")
	plTension = quantity("tension", units.ForcePerLength, "gt=0", "tension per length in the plane of the plate", "none")
	plHeld    = flag("edges_held", "whether the supports hold the edges in the plane", "true, false with a free edge")
)

// plateEdges lists the edges that a rectangular or circular plate can have.
func plateEdges() []string {
	list := []string{"simply-supported", "clamped"}
	for _, a := range "SCF" {
		for _, b := range "SCF" {
			for _, c := range "SCF" {
				for _, d := range "SCF" {
					if e := string([]rune{a, b, c, d}); strings.Count(e, "F") < 4 {
						list = append(list, e)
					}
				}
			}
		}
	}
	return list
}

// Plate is a rectangular or circular plate or panel.
var Plate = &Kind{
	Name:  "plate",
	Title: "Plate or panel",
	Doc:   "rectangular or circular plate in one bending mode, wetted on one side or both, at rest or under a grazing flow, over a wall or a closed cavity",
	Fields: modal(elastic(plLength, plWidth, plRadius, plThickness, plMass, plBending, plEdges, plModeM, plModeN, plSides, plBaffled,
		plTension, plHeld)...),
	Directions: []string{"grazing"},
	New:        newPlate,
}

// plate holds the solved problems of one plate.
type plate struct {
	circular bool
	a, b, h  float64
	edges    string
	disc     canon.CircularEdge
	x, y     canon.BeamSupport // supports of the mode's factors along x and y
	m, n     int
	sides    float64
	baffled  bool
	open     bool // a cantilever without a baffle in a mode of bending, whose fluid runs round its edges
	kb       float64
	meanW    float64 // mean of the mode shape
	meanW2   float64 // mean square
	slope    float64 // largest slope times the length
	curve    float64 // largest curvature times the length squared
	lambda2  float64
	mass     float64 // added mass over ρ a, incompressible, all wetted sides
	film     bool
	gap      float64 // to a wall, 0 without
}

func newPlate(r *Resolver) Physics {
	p := &plate{sides: 2, m: 1, n: 1, mass: math.NaN(), lambda2: math.NaN(), kb: math.NaN()}
	if !p.shape(r) {
		return p
	}
	r.closeGroups()
	r.damping()
	r.material()
	p.mode(r)
	p.masses(r)
	p.frequencies(r)
	r.interestOf()
	p.deform(r)
	r.shock(p.sides)
	if r.Is(group.Grazing) {
		p.limitCycle(r)
	}
	return p
}

func (p *plate) shape(r *Resolver) bool {
	a, b, radius := r.c.X(plLength), r.c.X(plWidth), r.c.X(plRadius)
	switch {
	case !math.IsNaN(radius) && (!math.IsNaN(a) || !math.IsNaN(b)):
		r.contradict(plRadius, "A plate has a radius, or length and width.")
		return false
	case math.IsNaN(radius) && (math.IsNaN(a) || math.IsNaN(b)):
		for _, f := range []*input.Field{plLength, plWidth} {
			if !r.c.Has(f) {
				r.violations.Add(f.Pointer(), input.MissingField, "A plate needs length and width, or a radius.", nil)
			}
		}
		return false
	case !math.IsNaN(radius):
		p.circular, p.a, p.b = true, radius, radius
		r.Put(scale.Length, radius, units.Length, scale.Given, "the radius")
	default:
		p.a, p.b = a, b
		if math.Abs(a/b-1) < 1e-9 { // a square is one in any units: its modes (m, n) and (n, m) mix
			p.b = p.a
		}
		r.Put(scale.Length, a, units.Length, scale.Given, "the side along x")
		r.Put(scale.Width, b, units.Length, scale.Given, "")
	}
	r.derive(scale.Span, p.a, units.Length, "the flow length")
	p.h = r.c.X(plThickness)
	r.takeOrNeed(scale.Thickness, plThickness)
	if v := r.c.Lookup(plSides); v != nil {
		p.sides = v.Q.Value
	} else if r.Is(group.Fluid) {
		r.warn(plSides, "assumed", "Both sides are taken as wetted.")
	}
	return p.edge(r)
}

// edge reads the edges and the mode.
func (p *plate) edge(r *Resolver) bool {
	p.edges = r.c.Choice(plEdges, "SSSS")
	named := p.edges == "simply-supported" || p.edges == "clamped"
	switch {
	case p.circular && !r.c.Has(plEdges):
		p.edges, named = "simply-supported", true
	case p.circular && !named && p.edges != "SSSS" && p.edges != "CCCC":
		r.contradict(plEdges, "A circular plate is simply-supported or clamped.")
		return false
	case !p.circular && named:
		p.edges = map[string]string{"simply-supported": "SSSS", "clamped": "CCCC"}[p.edges]
	}
	if !r.c.Has(plEdges) {
		r.warn(plEdges, "assumed", "The edges are taken as simply supported.")
	}
	if v := r.c.Lookup(plModeM); v != nil {
		p.m = int(v.Q.Value)
	}
	if v := r.c.Lookup(plModeN); v != nil {
		p.n = int(v.Q.Value)
	}
	p.disc = canon.CircularSimplySupported
	if strings.HasPrefix(p.edges, "c") || p.edges == "CCCC" {
		p.disc = canon.CircularClamped
	}
	p.supports(r)
	return true
}

// beamOf names the beam whose modes an edge pair suggests.
func beamOf(first, second byte) canon.BeamSupport {
	switch pair := string([]byte{first, second}); pair {
	case "CC":
		return canon.ClampedClamped
	case "CS", "SC":
		return canon.ClampedPinned
	case "CF", "FC":
		return canon.ClampedFree
	case "FF":
		return canon.FreeFree
	default:
		return canon.PinnedPinned
	}
}

func (p *plate) supports(r *Resolver) {
	free := !p.circular && strings.Contains(p.edges, "F")
	p.baffled = r.c.Flag(plBaffled, !free)
	if !r.c.Has(plBaffled) && r.Is(group.Fluid) && !free {
		r.warn(plBaffled, "assumed", "A rigid baffle is taken to surround the plate.")
	}
	r.trait(group.Flexible | group.PanelLike)
	held := !free
	if v := r.c.Lookup(plHeld); v != nil {
		held = v.Flag
	}
	if held {
		r.trait(group.Restrained)
	}
	if p.circular {
		return
	}
	p.x, p.y = beamOf(p.edges[0], p.edges[2]), beamOf(p.edges[1], p.edges[3])
	if p.x == canon.ClampedFree && p.y == canon.FreeFree {
		r.trait(group.Cantilever)
		p.open = p.n == 1 && !p.baffled
	}
}

// mode solves the mode in vacuo: λ², bending wave number, averages of the shape.
func (p *plate) mode(r *Resolver) {
	nu := r.X(scale.Poisson)
	if p.circular {
		p.discMode(nu)
		r.derive(scale.WaveNumber, p.kb, units.Dimensionless, "√λ²/a")
		return
	}
	p.lambda2, _, _ = canon.PlateMode(p.edges, p.a/p.b, p.m, p.rank(), nu)
	if p.lambda2 <= 0 {
		p.lambda2 = p.longPlate(nu)
	}
	p.kb = math.Sqrt(p.lambda2) / p.a
	r.derive(scale.WaveNumber, p.kb, units.Dimensionless, "√λ²/a")
	fx, _ := canon.BeamModeFactors(p.x, p.m)
	fy, _ := canon.BeamModeFactors(p.y, p.n)
	if p.y == canon.FreeFree { // the lowest mode across a free width is uniform
		fy = canon.BeamFactors{Mean: 1, MeanSquare: 1}
	}
	if p.x == canon.FreeFree {
		fx = canon.BeamFactors{Mean: 1, MeanSquare: 1}
	}
	p.meanW, p.meanW2 = fx.Mean*fy.Mean, fx.MeanSquare*fy.MeanSquare
	p.slope = math.Max(fx.MaxSlope, fy.MaxSlope*p.a/p.b)
	p.curve = math.Max(fx.MaxCurvature+nu*fy.MaxCurvature*p.a*p.a/(p.b*p.b), fy.MaxCurvature*p.a*p.a/(p.b*p.b)+nu*fx.MaxCurvature)
}

// longPlate is λ² of a plate whose sides differ by more than a factor of ten: a
// beam of its length where the long edges are free, else bending across the
// width only.
func (p *plate) longPlate(nu float64) float64 {
	along, errX := canon.BeamMode(p.x, p.m, 0)
	across, errY := canon.BeamMode(p.y, p.n, 0)
	switch {
	case p.y == canon.FreeFree && errX == nil && p.n == 1:
		return along * along * math.Sqrt(1-nu*nu)
	case p.x == canon.FreeFree && errY == nil && p.m == 1:
		return across * across * math.Sqrt(1-nu*nu) * p.a * p.a / (p.b * p.b)
	case errX != nil || errY != nil:
		return math.NaN()
	default:
		return along*along + across*across*p.a*p.a/(p.b*p.b)
	}
}

// rank is the second number of a mode: where all modes are ranked by frequency
// there is none.
func (p *plate) rank() int {
	ss := func(i, j int) bool { return p.edges[i] == 'S' && p.edges[j] == 'S' }
	if !strings.Contains(p.edges, "F") || ss(0, 2) || ss(1, 3) {
		return p.n
	}
	return 1
}

// discMode solves a mode of a circular plate and walks along its radius for
// the largest slope and curvature.
func (p *plate) discMode(nu float64) {
	p.lambda2, _ = canon.CircularPlateMode(p.disc, p.m-1, p.n-1, nu)
	p.kb = math.Sqrt(p.lambda2) / p.a
	shape := discShape{lambda: math.Sqrt(p.lambda2), order: p.n - 1}
	shape.mix = -math.Jn(shape.order, shape.lambda) / modifiedBessel(shape.order, shape.lambda)
	const points, step = 200, 1.0 / 200
	peak := 0.0
	for i := 0; i <= points; i++ {
		peak = math.Max(peak, math.Abs(shape.at(float64(i)*step)))
	}
	for i := 1; i < points; i++ {
		before, here, after := shape.at(float64(i-1)*step), shape.at(float64(i)*step), shape.at(float64(i+1)*step)
		p.slope = math.Max(p.slope, math.Abs(after-before)/(2*step)/peak)
		p.curve = math.Max(p.curve, math.Abs(after-2*here+before)/(step*step)/peak)
	}
	if p.n > 1 { // nodal diameters: as much up as down
		return
	}
	var volume, square float64 // ∫W r dr, ∫W² r dr, by Simpson's rule
	for i := 0; i <= points; i++ {
		r := float64(i) * step
		weight := step / 3 * float64(2+2*(i%2))
		if i == 0 || i == points {
			weight = step / 3
		}
		w := shape.at(r)
		volume += weight * w * r
		square += weight * w * w * r
	}
	p.meanW, p.meanW2 = 2*volume/peak, 2*square/(peak*peak)
}

// discShape is J_s(λr) + C I_s(λr), r from 0 to 1.
type discShape struct {
	lambda, mix float64
	order       int
}

func (d *discShape) at(r float64) float64 {
	return math.Jn(d.order, d.lambda*r) + d.mix*modifiedBessel(d.order, d.lambda*r)
}

// modifiedBessel is I_n(x) by its series, which has positive terms only: exact
// to rounding for the λ of the first modes.
func modifiedBessel(n int, x float64) float64 {
	term := 1.0
	for k := 1; k <= n; k++ {
		term *= x / 2 / float64(k)
	}
	sum := term
	for k := 1; k < 500 && term > 1e-17*sum; k++ {
		term *= x * x / 4 / float64(k) / float64(k+n)
		sum += term
	}
	return sum
}

// volumeShare is (mean W)²/(mean W²), the share of the mode that changes the
// volume of a cavity.
func (p *plate) volumeShare() float64 {
	if p.meanW == 0 {
		return 0
	}
	return p.meanW * p.meanW / p.meanW2
}

// masses resolves dry, displaced and added mass per area.
func (p *plate) masses(r *Resolver) {
	r.Value(scale.DryMass).Kind = units.MassPerArea
	if !r.take(scale.DryMass, plMass) {
		r.derive(scale.DryMass, r.X(scale.SolidDensity)*p.h, units.MassPerArea, "ρ_s h")
		switch {
		case math.IsNaN(p.h):
			r.Need(scale.DryMass, plThickness.Path())
		default:
			r.Need(scale.DryMass, plMass.Path())
		}
	}
	rho := r.X(scale.Density)
	r.derive(scale.DisplacedMass, rho*p.h, units.MassPerArea, "ρh")
	if math.IsNaN(p.h) {
		r.Need(scale.DisplacedMass, plThickness.Path())
	} else {
		r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	}
	p.addedMass(r, rho)
}

// addedMass resolves the ideal added mass: by Rayleigh's integral over the mode
// in a baffle, by the strip whose fluid runs round its edges, and near a wall by
// the layer of depth g under the bending wave, ρ/(k_b tanh k_b g).
func (p *plate) addedMass(r *Resolver, rho float64) {
	how := "Rayleigh's integral over the mode in a baffle"
	switch {
	case p.open:
		m, _ := openMass(p.kb, p.b, p.sides)
		p.mass = m / p.a
		how = "ρ/k_b per side, less what escapes round the edges: ρπb²/4 per length of a strip"
	case p.circular:
		m, err := canon.CircularPlateAddedMass(p.disc, p.m-1, p.n-1, r.X(scale.Poisson))
		if err != nil {
			m = 1 / (p.kb * p.a)
		}
		p.mass = m * p.sides
	default:
		m, _, err := canon.BaffledPlateMode(p.x, p.y, p.a/p.b, p.m, p.n, 0)
		if err != nil {
			m, how = 1/(p.kb*p.a), "ρ/k_b of an infinite plate"
		}
		p.mass = m * p.sides
	}
	free := p.mass * rho * p.a
	r.derive(scale.AddedMassFree, free, units.MassPerArea, how)
	p.wall(r, rho, free, how)
	r.addedNeeds(units.MassPerArea)
	r.nearSurface(p.a)
	viscous := 1 / p.kb
	if p.open {
		viscous = math.Min(p.b/2, viscous)
	}
	r.derive(scale.ViscousLength, viscous, units.Length, "half the width of a narrow cantilever, 1/k_b of a plate")
	r.Value(scale.ViscousLength).Kind = units.Length
	r.derive(scale.SemiChord, p.a/2, units.Length, "half the length along the flow")
	if rho > 0 && r.Has(scale.SoundSpeed) && p.stiffness(r) > 0 && r.Has(scale.DryMass) {
		c := r.X(scale.SoundSpeed)
		r.derive(scale.CoincidenceFrequency, c*c/(2*math.Pi)*math.Sqrt(r.X(scale.DryMass)/p.stiffness(r)), units.Frequency, "c²√(m″/D)/2π")
	}
}

func (p *plate) wall(r *Resolver, rho, free float64, how string) {
	gap := r.X(scale.WallGap)
	width := math.Min(p.a, p.b)
	if p.circular {
		width = 2 * p.a
	}
	if math.IsNaN(gap) || !r.Is(group.Fluid) {
		r.derive(scale.AddedMass, free, units.MassPerArea, how)
		return
	}
	r.derive(scale.Gap, gap, units.Length, "to the wall")
	r.trait(group.Confined)
	p.gap = gap
	other := free * (p.sides - 1) / p.sides
	derived := p.lambda2 / (2 * math.Pi * p.a * p.a) * math.Sqrt(p.stiffness(r)/r.X(scale.DryMass))
	inertia := 2 * math.Pi * r.likelyFrequency(derived) * gap * gap / r.X(scale.KinematicViscosity)
	if p.film = isFilm(gap, width, inertia, true); p.film {
		r.trait(group.Film)
		r.derive(scale.AddedMass, other, units.MassPerArea, "the open side; a film whose friction outweighs its inertia adds a spring and a damper, no mass")
		return
	}
	layer := rho / (p.kb * math.Tanh(p.kb*gap))
	r.derive(scale.AddedMass, math.Max(free, layer+other), units.MassPerArea, "ρ/(k_b tanh k_b g) towards the wall")
}

// A film is a gap below 15 % of the width in which friction is not far below
// inertia, ωg²/ν below 10: bounds a little beyond those of the assumption of
// lubrication, so that it decides.
const thinFilm, filmInertia = 0.15, 10

// stiffness is the bending stiffness D of the plate.
func (p *plate) stiffness(r *Resolver) float64 {
	if r.Has(scale.Bending) {
		return r.X(scale.Bending)
	}
	if r.take(scale.Bending, plBending) {
		return r.X(scale.Bending)
	}
	nu := r.X(scale.Poisson)
	r.derive(scale.Bending, r.X(scale.Young)*p.h*p.h*p.h/(12*(1-nu*nu)), units.BendingStiffnessPlate, "Eh³/(12(1 − ν²))")
	return r.X(scale.Bending)
}

func (p *plate) frequencies(r *Resolver) {
	d, m := p.stiffness(r), r.X(scale.DryMass)
	derived := p.lambda2 / (2 * math.Pi * p.a * p.a) * math.Sqrt(d/m)
	how := fmt.Sprintf("λ²/(2πa²) √(D/m″), λ² = %.5g", p.lambda2)
	if r.take(scale.Tension, plTension) {
		t := r.X(scale.Tension)
		membrane := p.kb * p.kb * t / m / (4 * math.Pi * math.Pi)
		if math.IsNaN(derived) {
			derived = 0
		}
		derived = math.Sqrt(derived*derived + membrane)
		how += ", with the tension"
	}
	if depth := r.c.X(BackingDepth); depth > 0 && r.Is(group.Fluid) {
		c := r.X(scale.SoundSpeed)
		spring := r.X(scale.Density) * c * c * p.volumeShare() / (4 * math.Pi * math.Pi * m * depth)
		r.sprung(derived, how, r.gamma(p.viscous), func(float64) float64 { return spring }, spring, scale.DryMass, scale.AddedMass, scale.Density, scale.SoundSpeed)
		return
	}
	r.frequencies(derived, how, r.gamma(p.viscous))
}

// viscous is Γ of the viscous solution at a frequency.
//
//	plate: 1 + (1 − i) k_b δ/2; open cantilever: joined with OscillatingRibbon(ωb²/(4ν));
//	gap: 1/(1 − tanh s/s), s = (g/2)√(iω/ν)
//
// The first is Stokes' layer under a bending wave: its displacement and its
// dissipation are those of the tangential speed of the potential flow. The
// third is the oscillating flow between two walls.
func (p *plate) viscous(f, nu float64) (gr, gi float64, err error) {
	switch {
	case p.gap > 0 && f > 0:
		gr, gi = betweenWalls(p.gap, f, nu)
		return gr, gi, nil
	case p.open:
		_, s := openMass(p.kb, p.b, p.sides)
		return sheetViscous(p.kb, p.b, s, f, nu)
	}
	layer := p.kb * math.Sqrt(nu/(math.Pi*f)) / 2
	return 1 + layer, layer, nil
}

// gapFactor is 1/(1 − tanh s/s) at s = (1 + i)x, x = (g/2)√(ω/2ν): of a slow motion,
// where the difference from 1 would cancel, by the continued fraction
// 1 + 3/s² + 1/(5 + s²/(7 + s²/(9 + …))), which gives all digits at any s.
func gapFactor(x float64) complex128 {
	s, s2 := complex(x, x), complex(0, 2*x*x)
	if x > 300 {
		return 1 / (1 - 1/s)
	}
	if x > 5 {
		return 1 / (1 - cmplx.Tanh(s)/s)
	}
	rest := complex(45, 0)
	for odd := 43; odd >= 5; odd -= 2 {
		rest = complex(float64(odd), 0) + s2/rest
	}
	return 1 + 3/s2 + 1/rest
}

// openMass is the added mass per area over ρ of a cantilever without a baffle, and
// the share s that the flow round its sides has in it.
//
//	1/m² = 1/m_r² + 1/m_w², m_r = πb/4, m_w = sides/k_b; s = m²/m_r²
//
// Symbols: k_b bending wave number, b width. Range: all. Accuracy: exact for a
// narrow strip, to the second order in k_b b, and for a wide sheet; 45 % too much at
// b = a in the first mode against Pabst's measured factor of finite plates.
// Check: k_b b 1.875, two sides, b 1: 0.6325. Source: the two potential flows;
// Pabst 1930 for comparison (from memory).
func openMass(kb, b, sides float64) (m, share float64) {
	strip, sheet := math.Pi/4*b, sides/kb
	m = strip * sheet / math.Hypot(strip, sheet)
	return m, m * m / (strip * strip)
}

// ribbon is Γ of a strip; beyond the range of the fit the layer is thin, and
// its effect falls as S^−½.
func ribbon(stokes float64) (gr, gi float64, err error) {
	const end = 1e4
	if stokes <= end {
		return canon.OscillatingRibbon(math.Max(stokes, 1e-6))
	}
	gr, gi, err = canon.OscillatingRibbon(end)
	thinner := math.Sqrt(end / stokes)
	return 1 + (gr-1)*thinner, gi * thinner, err
}

// deform puts the lengths over which an amplitude counts.
func (p *plate) deform(r *Resolver) {
	r.strains(p.a, p.curve, p.h, plThickness)
	if r.Is(group.Grazing) {
		r.Put(scale.StaticDeflection, 0, units.Length, scale.Derived, "a flow along a flat plate has no load across it")
	}
}

// flagAmplitude is the amplitude of a flag past its threshold over its length:
// limit cycles are measured between 0.1 and 0.3 (Eloy et al. 2008, from memory).
const flagAmplitude = 0.2

// flutterOnset is the speed at which a plate clamped at its leading edge
// flutters.
func (p *plate) flutterOnset(s *scale.Set) float64 {
	mass := s.X(scale.DryMass)
	critical, err := canon.FlagCritical(s.X(scale.Density)*p.a/mass, p.b/p.a)
	if err != nil {
		return math.NaN()
	}
	return critical / p.a * math.Sqrt(s.X(scale.Bending)/mass)
}

// limitCycle gives a flag past its threshold the amplitude of its limit cycle.
func (p *plate) limitCycle(r *Resolver) {
	if p.edges == "CFFF" && r.X(scale.SpeedHigh) > p.flutterOnset(r.Set) && !r.Is(group.Amplitude) {
		r.derive(scale.Amplitude, flagAmplitude*p.a, units.Length, "limit cycle of a flag, 0.2 L")
		if f, err := canon.BeamModeFactors(canon.ClampedFree, 2); err == nil { // it flaps in its second mode
			p.slope, p.curve = f.MaxSlope, f.MaxCurvature
		}
	}
}

// Groups puts the groups that are the plate's own.
func (p *plate) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.15, Viscous: 1.5, Acoustic: 1.15, Flow: 1.5, Buckling: 1.5, Flutter: 1.5,
		Stiffening: p.stiffening(s.X(scale.Poisson)), StallPerRadian: 1}
	if !p.baffled || !(p.x == canon.PinnedPinned && p.y == canon.PinnedPinned) && !p.circular {
		g.Factors.Inertia, g.Factors.Acoustic = 1.5, 1.5
	}
	g.Band = group.Transition{Low: 3e5, High: 3e6, Length: group.LengthReynolds}
	p.deformation(s, g)
	if !g.Is(group.Fluid) {
		return
	}
	g.Traits |= group.ViscousSolved
	p.still(s, g)
	wavePressure(g, p.kb*p.a)
	p.coupling(s, g)
	shockGroups(s, g)
	if s.Has(scale.WallGap) {
		p.filmGroups(s, g)
	}
	if s.Has(scale.BackingDepth) {
		p.cavity(s, g)
	}
	if g.Is(group.Grazing) {
		p.grazingGroups(s, g)
	}
}

// stiffening is κ of √(1 + κ(ξ/h)²) for edges that can't move.
func (p *plate) stiffening(nu float64) float64 {
	kind, aspect := canon.ImmovableSimplySupportedPlate, p.a/p.b
	switch {
	case p.circular && p.disc == canon.CircularClamped:
		kind, aspect = canon.ImmovableClampedCircularPlate, 1
	case p.circular:
		aspect = 1
	case p.edges == "CCCC":
		kind, nu, aspect = canon.ImmovableClampedSquarePlate, 0.3, 1
	}
	aspect = math.Max(0.1, math.Min(aspect, 10))
	ratio, err := canon.LargeAmplitude(kind, 1, aspect, nu)
	if err != nil {
		return 1
	}
	return ratio*ratio - 1
}

func (p *plate) deformation(s *scale.Set, g *group.Set) {
	amplitudeOver(s, g, group.DisplacementThickness, p.h)
	amplitudeOver(s, g, group.Slope, p.a/p.slope)
	g.Drop(group.DisplacementSpan)
	if t := p.h / p.a; !math.IsNaN(t) {
		g.Put(group.ThicknessRatio, t)
	}
}

// still puts the factors of oscillation in fluid at rest.
func (p *plate) still(s *scale.Set, g *group.Set) {
	fw, c := s.X(scale.FrequencyWet), s.X(scale.SoundSpeed)
	viscousGroups(s, g, p.viscous)
	share := 1.0 // only the open fluid radiates: near a wall it is a share of the added mass
	if g.Has(group.AddedMassRatio) && g.Has(group.AddedMassRatioFree) && p.gap > 0 {
		share = g.Get(group.AddedMassRatioFree) / math.Max(g.Get(group.AddedMassRatio), g.Get(group.AddedMassRatioFree)) * math.Max(p.sides-1, 0) / p.sides
	}
	soundGroups(s, g, 2*math.Pi*fw/c, func(k0 float64) (gr, gi float64, err error) { return p.sound(k0, share) })
	if loading := s.X(scale.Density) * c / (s.X(scale.DryMass) * 2 * math.Pi * s.X(scale.CoincidenceFrequency)); !math.IsNaN(loading) {
		g.Put(group.FluidLoading, loading)
	}
	if d := s.X(scale.Depth); g.Is(group.NearSurface) {
		t := math.Tanh(p.kb * d)
		g.Put(group.SurfaceInertiaLid, 1/t)
		g.Put(group.SurfaceInertiaFree, t)
	}
	acousticStep(s, g, p.sides)
	if g.Is(group.Liquid) {
		g.Drop(group.Knudsen)
	} else if !s.Has(scale.Gap) {
		putOrWait(s, g, group.Knudsen, meanFreePath(s)/math.Min(p.a, p.b), scale.HeatCapacityRatio, scale.KinematicViscosity, scale.SoundSpeed)
	}
}

// sound is Γ of the acoustic solution: the mode's radiation in a baffle, per
// ideal added mass, of which a share radiates.
func (p *plate) sound(k0, share float64) (gr, gi float64, err error) {
	var mass, resistance float64
	switch {
	case p.open:
		// as a cylinder of its smaller side, whose dipole radiates likewise
		return canon.SoundCylinder(k0 * math.Min(p.a, p.b) / 2)
	case p.circular:
		mass, resistance, err = canon.BaffledCircularPlateMode(p.disc, p.m-1, p.n-1, 0.3, k0*p.a)
	default:
		mass, resistance, err = canon.BaffledPlateMode(p.x, p.y, p.a/p.b, p.m, p.n, k0*p.a)
	}
	if err != nil { // beyond the range of the finite plate: the infinite one
		mass, resistance, err = canon.FlexuralWaveLoading(k0/p.kb, p.kb*p.a)
		mass /= p.kb * p.a
	}
	ideal := p.mass / p.sides
	return math.Max(1+share*(mass/ideal-1), 0), share * resistance / (k0 * p.a * ideal), err
}

// coupling bounds what the fluid couples: the next mode of the same parity, and
// an off-diagonal share of at most 1 (Cauchy and Schwarz).
func (p *plate) coupling(s *scale.Set, g *group.Set) {
	g.Put(group.ModeCoupling, 1)
	next := math.NaN()
	if p.circular {
		next, _ = canon.CircularPlateMode(p.disc, p.m, p.n-1, s.X(scale.Poisson))
	} else if !strings.Contains(p.edges, "F") {
		one, _, e1 := canon.PlateMode(p.edges, p.a/p.b, p.m+2, p.n, s.X(scale.Poisson))
		two, _, e2 := canon.PlateMode(p.edges, p.a/p.b, p.m, p.n+2, s.X(scale.Poisson))
		switch {
		case e1 == nil && e2 == nil:
			next = math.Min(one, two)
		case e1 == nil:
			next = one
		case e2 == nil:
			next = two
		}
	}
	if next > 0 && p.lambda2 > 0 {
		g.Put(group.NextMode, next/p.lambda2)
	}
}

// filmGroups puts the squeeze film between the plate and a wall.
func (p *plate) filmGroups(s *scale.Set, g *group.Set) {
	gap := s.X(scale.WallGap)
	g.Put(group.GapRatio, gap/math.Min(p.a, p.b))
	omega := 2 * math.Pi * s.X(scale.FrequencyMotion)
	eta, pressure := s.X(scale.Viscosity), s.X(scale.Pressure)
	kn := 0.0
	if g.Is(group.Gas) && g.Has(group.Knudsen) {
		kn = g.Get(group.Knudsen)
		if ratio, err := canon.VeijolaViscosity(kn); err == nil {
			eta *= ratio
		}
	}
	sigma := 12 * eta * omega * p.filmArea() / (pressure * gap * gap)
	if g.Is(group.Liquid) {
		p.liquidFilm(s, g, eta, gap, omega)
		return
	}
	if math.IsNaN(sigma) {
		waitFor(s, g, []scale.ID{scale.FrequencyMotion, scale.Viscosity}, group.Squeeze, group.FluidStiffness)
		return
	}
	g.Put(group.Squeeze, sigma)
	if !p.film {
		return
	}
	g.Put(group.ViscousInertia, 1)
	g.Drop(group.ViscousDamping)
	if spring, damper, err := canon.ThinFilm(sigma, p.filmAspect()); err == nil {
		inertia := s.X(scale.DryMass) + s.X(scale.AddedMass)
		putOrWait(s, g, group.FluidStiffness, spring*pressure/gap/(s.X(scale.DryMass)*math.Pow(2*math.Pi*s.X(scale.FrequencyDry), 2)), scale.DryMass, scale.FrequencyDry)
		putOrWait(s, g, group.DampingViscous, damper*pressure/gap/(2*inertia*omega*omega), scale.DryMass, scale.FrequencyMotion)
	}
}

// liquidFilm puts the damper of a liquid film, which has no spring.
func (p *plate) liquidFilm(s *scale.Set, g *group.Set, eta, gap, omega float64) {
	if !p.film {
		return
	}
	g.Put(group.FluidStiffness, 0)
	g.Put(group.ViscousInertia, 1)
	g.Drop(group.ViscousDamping)
	c, err := canon.ThinFilmLiquid(p.a / p.b)
	if err != nil {
		return
	}
	c *= eta * p.filmArea() / (gap * gap * gap) // per area
	putOrWait(s, g, group.DampingViscous, c/(2*(s.X(scale.DryMass)+s.X(scale.AddedMass))*omega), scale.DryMass, scale.FrequencyMotion)
}

// filmArea is the square of the side along x; a disc counts as the square of
// its area, within 12 % for a liquid.
func (p *plate) filmArea() float64 {
	if p.circular {
		return math.Pi * p.a * p.a
	}
	return p.a * p.a
}

func (p *plate) filmAspect() float64 {
	if p.circular {
		return 1
	}
	return p.a / p.b
}

// cavity puts the stiffness and the resonance of a closed cavity behind.
func (p *plate) cavity(s *scale.Set, g *group.Set) {
	g.Traits |= group.Cavity
	d, c, f := s.X(scale.BackingDepth), s.X(scale.SoundSpeed), s.X(scale.FrequencyDry)
	putOrWait(s, g, group.CavityFrequency, s.X(scale.FrequencyWet)*2*d/c, scale.FrequencyWet, scale.SoundSpeed)
	omega := 2 * math.Pi * f
	stiffness := s.X(scale.Density) * c * c / (s.X(scale.DryMass) * d * omega * omega) * p.volumeShare()
	putOrWait(s, g, group.FluidStiffness, stiffness+known(g, group.FluidStiffness), scale.SoundSpeed, scale.DryMass, scale.FrequencyDry, scale.Density)
	sprungDamping(s, g)
}

func known(g *group.Set, id group.ID) float64 {
	if g.Has(id) {
		return g.Get(id)
	}
	return 0
}

// grazingGroups puts what a flow over a panel makes: below Mach 1 the flow
// stiffness ρU²k_b on each wetted side, which makes it diverge at q = D k_b³/2;
// beyond √2 flutter by piston theory.
func (p *plate) grazingGroups(s *scale.Set, g *group.Set) {
	g.Traits |= group.Streamlined
	g.Put(group.SuctionPeak, 0.1) // a flat plate along the flow: the ripple of a bent panel
	waveLayer(g, p.a, p.alongWave())
	putOrWait(s, g, group.ReducedFrequency, 2*math.Pi*s.X(scale.FrequencyMotion)/(s.X(scale.Speed)*p.alongWave()), scale.FrequencyMotion, scale.Speed)
	mach := g.Get(group.Mach)
	if math.IsNaN(mach) {
		for _, id := range []group.ID{group.FlowStiffness, group.DivergenceSpeed, group.PseudoStatic} {
			g.Miss(id, g.Need(group.Mach))
		}
		return
	}
	switch {
	case p.edges == "CFFF":
		p.flag(s, g)
		return
	case mach < 1:
		p.subsonic(s, g, mach)
		return
	}
	p.supersonic(s, g, mach)
}

// flag puts flutter of a plate clamped at its leading edge, which comes before
// divergence.
func (p *plate) flag(s *scale.Set, g *group.Set) {
	needs := []scale.ID{scale.SpeedHigh, scale.Density, scale.DryMass, scale.Thickness, scale.Young}
	onset := p.flutterOnset(s)
	if math.IsNaN(onset) {
		waitFor(s, g, needs, group.FlutterSpeed, group.FlowStiffness, group.PseudoStatic)
		return
	}
	g.Flutter = 2
	g.Put(group.FlutterSpeed, s.X(scale.SpeedHigh)/onset)
	ratio := s.X(scale.Speed) / onset
	g.Put(group.FlowStiffness, ratio*ratio)
	g.Put(group.PseudoStatic, 2*2*math.Pi*s.X(scale.FrequencyMotion)/(s.X(scale.Speed)*p.kb))
}

// subsonic puts divergence of a panel between the waves of a potential flow:
// the suction over a bump is ρU²k_b/√(1 − M²) per wetted side and displacement.
func (p *plate) subsonic(s *scale.Set, g *group.Set, mach float64) {
	u, rho := s.X(scale.Speed), s.X(scale.Density)
	modal := s.X(scale.DryMass) * math.Pow(2*math.Pi*s.X(scale.FrequencyDry), 2)
	floor := math.Sqrt(math.Max(1-mach*mach, 0.19)) // the value at M 0.9
	along := p.alongWave()
	stiffness := rho * u * u * along * along / p.kb * p.sides / floor / modal
	needs := []scale.ID{scale.Speed, scale.Density, scale.DryMass, scale.FrequencyDry}
	putOrWait(s, g, group.FlowStiffness, stiffness, needs...)
	if !math.IsNaN(stiffness) {
		g.Put(group.DivergenceSpeed, math.Sqrt(stiffness)*s.X(scale.SpeedHigh)/u)
		g.Put(group.PseudoStatic, 2*2*math.Pi*s.X(scale.FrequencyMotion)/(u*along))
		g.Put(group.DampingFlow, 0) // subsonic potential flow takes no energy from a standing wave
		return
	}
	waitFor(s, g, needs, group.DivergenceSpeed, group.PseudoStatic)
}

// alongWave is the part of the bending wave number along the flow.
func (p *plate) alongWave() float64 {
	if p.circular {
		return p.kb / math.Sqrt2
	}
	beta, err := canon.BeamMode(p.x, p.m, 0)
	if err != nil {
		return p.kb
	}
	return beta / p.a
}

// Dynamic pressure parameter λ = 2qa³/(D√(M² − 1)) at which a two-dimensional
// pinned panel flutters by first-order piston theory, converged (Dowell 1975).
const panelFlutterLambda = 343.3564

func (p *plate) supersonic(s *scale.Set, g *group.Set, mach float64) {
	u, rho, d := s.X(scale.SpeedHigh), s.X(scale.Density), s.X(scale.Bending)
	needs := []scale.ID{scale.SpeedHigh, scale.Density, scale.Thickness, scale.Young}
	root := math.Sqrt(math.Max(mach*mach-1, 1)) // piston theory begins at M = √2
	lambda := rho * u * u * p.a * p.a * p.a / (d * root)
	putOrWait(s, g, group.FlutterSpeed, math.Sqrt(lambda/panelFlutterLambda), needs...)
	// piston theory: damping ρU/√(M² − 1) on one side; its stiffness couples the
	// first two modes, which meet at the onset: k/k₁ = ½(ω₂²/ω₁² − 1)(1 − √(1 − u⁴))
	if flutter := g.Get(group.FlutterSpeed) * s.X(scale.Speed) / s.X(scale.SpeedHigh); !math.IsNaN(flutter) {
		u4 := math.Min(math.Pow(flutter, 4), 1)
		g.Put(group.FlowStiffness, 7.5*(1-math.Sqrt(1-u4))) // (16 − 1)/2 of a pinned panel
	}
	zeta := rho * s.X(scale.Speed) / root / (2 * 2 * math.Pi * s.X(scale.FrequencyWet) * (s.X(scale.DryMass) + s.X(scale.AddedMass)))
	g.Put(group.DampingFlow, zeta)
}
