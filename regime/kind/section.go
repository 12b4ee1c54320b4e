package kind

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// Shapes beyond those of the tables.
const (
	shapeDeck  = "deck"
	shapePlate = "plate"
)

// The fields of a section.
var (
	secShape       = choice("shape", "shape of the section", "bluff", sectionShapes()...)
	secBreadth     = quantity("breadth", units.Length, "gt=0", "length of the section along the flow", "the depth")
	secDepth       = &input.Field{Name: "depth", Type: input.Quantity, Kind: units.Length, Rule: "gt=0", Needed: true, Doc: "width of the section across the flow: the diameter of a cable, the height of a deck"}
	secStreamlined = flag("streamlined", "whether the flow stays attached: a flat closed box does it, an H section does not", "true for a plate, else false")
	secEdge        = quantity("trailing_edge_thickness", units.Length, "gt=0", "thickness of a blunt trailing edge of a streamlined section, from which it sheds", "none: no shedding is looked at")
	secArea        = quantity("area", units.Area, "gt=0", "area of the section that displaces fluid", "breadth × depth; π/4 of it for round shapes, 0.7 of it for streamlined ones")
	secMass        = quantity("mass_per_length", units.MassPerLength, "gt=0", "mass per length, never with added mass", "")
	secInertia     = quantity("inertia_per_length", units.InertiaPerLength, "gt=0", "mass moment of inertia per length about the elastic axis", "")
	secBending     = quantity("frequency_bending", units.Frequency, "gt=0", "dry frequency of bending across the flow; the same as frequency_dry", "")
	secTorsion     = quantity("frequency_torsion", units.Frequency, "gt=0", "dry frequency of torsion, uncoupled", "")
	secSpan        = quantity("span", units.Length, "gt=0", "length between the supports", "")
	secAxis        = pure("elastic_axis", "gte=0,lte=1", "elastic axis behind the leading edge, in breadths", "0.5")
	secGravity     = pure("centre_of_gravity", "gte=0,lte=1", "centre of gravity behind the leading edge, in breadths", "0.5")
	secAdded       = pure("added_mass_coefficient", "gte=0", "added mass over ρπB²/4, B the breadth", "by shape")
	secDrag        = pure("drag_coefficient", "gt=0", "mean drag coefficient on the depth", "by shape")
	secLiftSlope   = pure("lift_slope", "gt=0,lte=20", "slope of the lift coefficient of a streamlined section per radian, on the breadth", "2π")
	secMoment      = pure("moment_slope", "gte=-20,lte=20", "slope of the coefficient of the moment about the elastic axis per radian, nose up, on the breadth squared", "by shape")
	secLift        = pure("lift_coefficient", "gt=0", "r.m.s. unsteady lift coefficient of shedding, on the depth", "by shape")
	secStrouhal    = pure("strouhal", "gt=0,lt=1", "Strouhal number on the depth (of a streamlined section on its trailing edge)", "by shape")
	secGalloping   = pure("galloping_factor", "gte=-1000,lte=1000", "a_G = −(dC_L/dα + C_D) on the depth; ≤ 0: it does not gallop", "by shape")
	secDivergence  = quantity("divergence_speed", units.Speed, "gt=0", "divergence speed, where it is known", "by the moment slope")
	secFlutter     = quantity("flutter_speed", units.Speed, "gt=0", "flutter speed, where it is known, by a test perhaps", "as a thin aerofoil")
	secStall       = quantity("stall_angle", units.Angle, "gt=0,lte=1.6", "incidence at which a streamlined section stalls", "10 deg")
	secSuction     = pure("suction_peak", "gt=0", "largest suction −Cp_min", "by shape")
)

func sectionShapes() []string {
	var names []string
	for _, s := range canon.SectionShapes() {
		names = append(names, string(s))
	}
	return append(names, shapeDeck, shapePlate)
}

// Section is a slender body of any cross-section in cross flow.
var Section = &Kind{
	Name:  "section",
	Title: "Section across a flow",
	Doc:   "slender body of any cross-section across a flow: bridge deck, mast, profile, iced cable, in bending and torsion",
	Fields: modal(secShape, secBreadth, secDepth, secStreamlined, secEdge, secArea, secMass, secInertia, secBending, secTorsion, secSpan, secAxis, secGravity,
		secAdded, secDrag, secLiftSlope, secMoment, secLift, secStrouhal, secGalloping, secDivergence, secFlutter, secStall, secSuction),
	Directions: []string{"cross"},
	New:        newSection,
}

// section holds the solved problems of one section.
type section struct {
	shape     string
	table     canon.SectionShape // the shape under which tables are read
	b, d      float64            // along and across the flow
	round     bool
	still     strip
	torsion   typical
	wake      wake
	massRatio float64 // dry mass over ρπD²/4, on which amplitudes are measured whatever the area
	added     float64 // added mass over the same
	drag      float64 // on the depth
	suction   float64
	galloping float64 // a_G; NaN: not known
	gallopU   float64 // onset of galloping; +Inf: none, NaN: not known
	criticalU float64 // where shedding meets the mode; NaN: none or not known
}

func newSection(r *Resolver) Physics {
	c := &section{shape: r.c.Choice(secShape, string(canon.SectionBluff)), suction: r.c.X(secSuction),
		massRatio: math.NaN(), gallopU: math.NaN(), criticalU: math.NaN(), galloping: math.NaN()}
	if !c.dimensions(r) {
		return c
	}
	c.attached(r)
	r.closeGroups()
	r.damping()
	c.masses(r)
	r.bendingFrequency(secBending)
	r.frequencies(math.NaN(), "", r.gamma(c.still.viscous))
	c.twist(r)
	r.interestOf()
	if r.Any(group.Flow) {
		c.flow(r)
	}
	return c
}

// dimensions reads breadth and depth, and whether they fit the shape.
func (c *section) dimensions(r *Resolver) bool {
	c.d, c.b = r.c.X(secDepth), r.c.X(secBreadth)
	c.table = canon.SectionShape(c.shape)
	switch c.shape {
	case string(canon.SectionCircle), string(canon.SectionIcedCable):
		c.round = true
	case shapeDeck:
		c.table = canon.SectionRectangle
	case shapePlate:
		c.table = canon.SectionRectangle
	}
	equal := c.shape == string(canon.SectionCircle) || c.shape == string(canon.SectionSquare)
	switch {
	case math.IsNaN(c.b):
		c.b = c.d
		if !equal && !c.round {
			r.warn(secBreadth, "assumed", "The breadth is taken as the depth.")
		}
	case equal && math.Abs(c.b/c.d-1) > 1e-3:
		r.contradict(secBreadth, "A circle or a square is as broad as it is deep.")
		return false
	case equal || math.Abs(c.b/c.d-1) < 1e-9: // the same length in two units is the same
		c.b = c.d
	}
	if !r.c.Has(secShape) {
		r.warn(secShape, "assumed", "The section is taken as a bluff one of no particular shape.")
	}
	r.Put(scale.Length, c.d, units.Length, scale.Given, "the depth, across the flow")
	r.derive(scale.Breadth, c.b, units.Length, "along the flow")
	r.derive(scale.SemiChord, c.b/2, units.Length, "half the breadth")
	r.takeOrNeed(scale.Span, secSpan)
	r.trait(group.Uniform)
	r.nearSurface(c.d)
	return true
}

// attached decides whether the section is streamlined or bluff.
func (c *section) attached(r *Resolver) {
	may := c.shape == shapeDeck || c.shape == shapePlate || c.shape == string(canon.SectionBluff) || c.shape == string(canon.SectionRectangle)
	streamlined := r.c.Flag(secStreamlined, c.shape == shapePlate)
	switch {
	case streamlined && !may:
		r.contradict(secStreamlined, "The flow separates from this shape: it is not streamlined.")
	case streamlined:
		r.trait(group.Streamlined | group.Lifting)
		r.takeOr(scale.StallAngle, secStall, 10*math.Pi/180, "a thin section at moderate Reynolds number")
	default:
		r.trait(group.Bluff)
	}
	if c.shape == shapeDeck && !r.c.Has(secStreamlined) {
		r.warn(secStreamlined, "assumed", "The deck is taken as bluff; a flat closed box with sharp noses is streamlined.")
	}
	if c.shape == string(canon.SectionCircle) {
		r.trait(group.Circular)
	}
	// ten digits decide alike in any units
	if !atMost(c.b, 2*c.d) {
		r.trait(group.Elongated)
	}
	if !streamlined {
		return
	}
	if r.c.Has(secEdge) {
		r.trait(group.BluntEdge)
		if r.c.X(secEdge) > c.d*(1+1e-9) {
			r.contradict(secEdge, "The trailing edge is thicker than the section.")
		}
	} else if r.Any(group.Flow) {
		r.warn(secEdge, "assumed", "The trailing edge is taken as sharp, so that no shedding is looked at; a box deck can shed at low wind.")
	}
}

// masses resolves dry, displaced and added mass per length.
func (c *section) masses(r *Resolver) {
	r.takeOrNeed(scale.DryMass, secMass)
	fill, how := 1.0, "ρ times breadth and depth"
	switch {
	case c.round:
		fill, how = math.Pi/4, "ρπBD/4"
	case r.Is(group.Streamlined):
		fill, how = 0.7, "ρ times 0.7 of breadth and depth"
	}
	area := fill * c.b * c.d
	if v := r.c.Lookup(secArea); v != nil {
		area, how = v.Q.Value, "ρ times the area"
	}
	rho := r.X(scale.Density)
	r.derive(scale.DisplacedMass, rho*area, units.MassPerLength, how)
	r.Value(scale.DisplacedMass).Kind = units.MassPerLength
	r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	coefficient, why := c.addedCoefficient(r)
	free := coefficient * rho * math.Pi * c.b * c.b / 4
	r.derive(scale.AddedMassFree, free, units.MassPerLength, why)
	factor, walls := r.confine(math.Max(c.b, c.d))
	r.derive(scale.AddedMass, free*factor, units.MassPerLength, why+walls)
	r.addedNeeds(units.MassPerLength)
	c.still = strip{width: c.b, round: !r.Is(group.Elongated)}
	r.derive(scale.ViscousLength, c.b/2, units.Length, "half the breadth")
	circle := rho * math.Pi * c.d * c.d / 4
	c.massRatio, c.added = r.X(scale.DryMass)/circle, r.X(scale.AddedMass)/circle
}

// Added mass of a rectangle that moves along its depth, over ρπB²/4, by B/D
// (DNV-RP-C205 Table D-1, from memory).
var addedRectangle = []ofRatio{
	{0.1, 2.23}, {0.2, 1.98}, {0.5, 1.70}, {1, 1.51}, {2, 1.36}, {5, 1.21}, {10, 1.14}, {100, 1.01},
}

func (c *section) addedCoefficient(r *Resolver) (float64, string) {
	if v := r.c.Lookup(secAdded); v != nil {
		return v.Q.Value, "the coefficient given times ρπB²/4"
	}
	if c.round || r.Is(group.Streamlined) {
		return 1, "ρπB²/4 of an ellipse or a plate"
	}
	return rectangleAdded(c.b / c.d), "a rectangle of this breadth and depth"
}

func rectangleAdded(ratio float64) float64 { return interpolate(addedRectangle, ratio) }

// ofRatio is a value at a ratio of the sides, a row of a table.
type ofRatio struct{ ratio, value float64 }

// interpolate is linear in the logarithm of the ratio, and level beyond the table.
func interpolate(table []ofRatio, ratio float64) float64 {
	if ratio <= table[0].ratio {
		return table[0].value
	}
	for i := 1; i < len(table); i++ {
		a, b := table[i-1], table[i]
		if ratio <= b.ratio {
			return a.value + (b.value-a.value)*math.Log(ratio/a.ratio)/math.Log(b.ratio/a.ratio)
		}
	}
	return table[len(table)-1].value
}

// twist reads the torsion. A compact bluff section without a moment that grows
// with its twist has none that matters.
func (c *section) twist(r *Resolver) {
	if !r.c.Has(secAxis) {
		r.Put(scale.ElasticAxis, 0.5, units.Dimensionless, scale.Assumed, "the middle of the breadth")
	}
	if !r.c.Has(secGravity) {
		r.Put(scale.CentreOfGravity, 0.5, units.Dimensionless, scale.Assumed, "the middle of the breadth")
	}
	c.torsion.chord = c.b
	c.torsion.take(r, torsional{secInertia, secTorsion, secAxis, secGravity, secDivergence, secFlutter})
	t := &c.torsion
	t.lift = r.c.X(secLiftSlope)
	if math.IsNaN(t.lift) {
		t.lift = 2 * math.Pi
	}
	t.moment = c.momentSlope(r)
	t.inUse = r.Any(group.Streamlined|group.Elongated) || r.c.Has(secMoment) && t.moment > 0 || r.c.Has(secDivergence) || r.c.Has(secFlutter)
	t.wait = []scale.ID{scale.Speed, scale.Density, scale.DryMass, scale.InertiaPerLength, scale.FrequencyTorsion, scale.FrequencyDry}
	if !t.inUse || !r.Is(group.Fluid) {
		r.Value(scale.InertiaPerLength).Needs = ""
		r.Value(scale.FrequencyTorsion).Needs = ""
		if !r.Is(group.Fluid) {
			t.inUse = false
		}
	}
	if !t.inUse || !r.Any(group.Flow) {
		return
	}
	r.Put(scale.MomentSlope, t.moment, units.Dimensionless, given(r.c.Has(secMoment)), "by shape: a flat plate, or a rectangle")
	t.solve(r)
}

func given(yes bool) scale.Origin {
	if yes {
		return scale.Given
	}
	return scale.Assumed
}

// momentSlope is dC_M/dα about the elastic axis, on B².
//
//	streamlined: C_Lα (x_ea − ¼); others: −6.3(D/B)² − 0.38 D/B + 1.6
//
// Symbols: x_ea elastic axis behind the leading edge [B]; D/B depth over breadth.
// Range: the rectangle about its middle, D/B up to 1. Accuracy: 20 %, other
// shapes than rectangles more. Check: a plate about its middle π/2, near 1.6.
// Source: thin aerofoil; EN 1991-1-4 Figure E.6, from memory.
func (c *section) momentSlope(r *Resolver) float64 {
	if v := r.c.Lookup(secMoment); v != nil {
		return v.Q.Value
	}
	if r.Is(group.Streamlined) {
		return c.torsion.lift * (r.X(scale.ElasticAxis) - 0.25)
	}
	x := c.d / c.b
	if c.round || x > 1 {
		return 0
	}
	return -6.3*x*x - 0.38*x + 1.6
}

// flow solves the flow across the section.
func (c *section) flow(r *Resolver) {
	c.drag = c.dragCoefficient(r)
	ratio := c.b / c.d
	c.wake = wake{shape: c.table, ratio: ratio, strouhal: r.c.X(secStrouhal), drag: c.drag, lift: c.liftFluctuation(r, ratio),
		modeFactor: canon.ModeFactorSine, modes: r.bendingAndTorsion(), first: 1}
	switch {
	case r.Is(group.Bluff):
		c.wake.solve(r, c.massRatio, c.added, math.Pi/4)
		c.wake.amplify(r, c.massRatio, c.added)
		if c.wake.vibrating() && !r.Is(group.Amplitude) {
			r.derive(scale.Amplitude, c.wake.amplitude*c.d, units.Length, "amplitude of the locked-in vibration")
		}
	case r.Is(group.BluntEdge):
		c.edge(r)
	}
	c.gallop(r)
	u := r.X(scale.Speed)
	lift := 0.0
	if r.Is(group.Lifting) {
		lift = c.torsion.lift * math.Abs(r.X(scale.Incidence)) * c.b
	}
	// 4/π: share of a uniform load in a mode of half a sine
	r.deflect(r.X(scale.Density)*u*u/2*math.Hypot(c.drag*c.d, lift), 4/math.Pi, units.ForcePerLength)
}

func (c *section) edge(r *Resolver) {
	if math.IsNaN(c.wake.strouhal) {
		c.wake.strouhal = edgeStrouhal
		r.warn(secStrouhal, "assumed", "The Strouhal number of the trailing edge is taken as 0.22 on its thickness.")
	}
	r.edgeWake(&c.wake, r.c.X(secEdge))
}

// Drag of a sharp-edged rectangle on its depth, by B/D (EN 1991-1-4 Figure 7.23,
// from memory).
var dragRectangle = []ofRatio{{0.1, 2.0}, {0.2, 2.0}, {0.65, 2.4}, {1, 2.1}, {2, 1.65}, {5, 1.0}, {10, 0.9}}

// dragCoefficient on the depth: by shape, where it was not given.
func (c *section) dragCoefficient(r *Resolver) float64 {
	if v := r.c.Lookup(secDrag); v != nil {
		return v.Q.Value
	}
	var drag float64
	switch {
	case c.shape == string(canon.SectionCircle):
		w := wake{shape: canon.SectionCircle, drag: math.NaN()}
		return w.dragCoefficient(r.reynoldsAt(r.X(scale.Speed)))
	case c.shape == shapePlate && r.Is(group.Streamlined):
		drag = 0.02 * c.b / c.d // friction on both sides at moderate Reynolds numbers
	case r.Is(group.Streamlined):
		drag = 0.6 // a flat closed box deck on its depth (Larsen 1993, from memory)
	case c.shape == string(canon.SectionIcedCable):
		drag = 1.2 // as a circle below the drag crisis
	case c.table == canon.SectionRectangle, c.table == canon.SectionSquare, c.table == canon.SectionBluff:
		drag = c.rectangleDrag()
	default:
		drag = 2.0 // sharp-edged open sections: EN 1991-1-4 section 7.7, from memory
	}
	r.warn(secDrag, "assumed", "The drag coefficient is taken by shape: "+units.Format(drag, units.Dimensionless)+" on the depth.")
	return drag
}

func (c *section) rectangleDrag() float64 { return interpolate(dragRectangle, c.b/c.d) }

// liftFluctuation is the r.m.s. lift coefficient of the fixed section, on its
// depth: a square 1.1 and open sections 0.8 (EN 1991-1-4 Table E.2, from memory),
// a rectangle of 5 : 1 some 0.65 (Bruno, Salvetti & Ricciardelli 2014, from memory).
func (c *section) liftFluctuation(r *Resolver, ratio float64) float64 {
	if v := r.c.Lookup(secLift); v != nil {
		return v.Q.Value
	}
	lift := 0.8
	switch c.table {
	case canon.SectionCircle, canon.SectionIcedCable, canon.SectionBluff:
		lift = defaultLift
	case canon.SectionSquare, canon.SectionRectangle:
		lift = 1.1 - 0.15*within(ratio-2, 0, 3)
	}
	if r.Is(group.Bluff) {
		r.warn(secLift, "assumed", "The r.m.s. lift coefficient of shedding is taken by shape: "+units.Format(lift, units.Dimensionless)+".")
	}
	return lift
}

// gallop finds the onset of galloping, 2 Sc f D/a_G, and the critical speed of
// shedding beside it.
func (c *section) gallop(r *Resolver) {
	if !r.Is(group.Bluff) {
		return
	}
	if c.wake.st > 0 {
		c.criticalU = r.X(scale.FrequencyWet) * c.d / c.wake.st
		r.derive(scale.CriticalSpeed, c.criticalU, units.Speed, "f_w D/St")
	}
	c.galloping = c.gallopingFactor(r)
	if c.galloping <= 0 {
		c.gallopU = math.Inf(1)
		return
	}
	sc := 4 * math.Pi * r.X(scale.DryMass) * r.X(scale.Damping) / (r.X(scale.Density) * c.d * c.d)
	v, err := canon.GallopingSpeed(math.Min(sc, 1e9), c.galloping)
	if err != nil {
		return
	}
	c.gallopU = v * r.X(scale.FrequencyDry) * c.d
	r.derive(scale.GallopingSpeed, c.gallopU, units.Speed, "2 Sc f D/a_G")
}

// gallopingFactor is a_G: given, or by the table. The flow comes back to the sides
// of rectangles longer than three depths: whether they gallop is for a
// measurement (Blevins 1990, chapter 4, from memory), and the factor stays unknown.
func (c *section) gallopingFactor(r *Resolver) float64 {
	if v := r.c.Lookup(secGalloping); v != nil {
		return v.Q.Value
	}
	if c.shape == string(canon.SectionCircle) {
		return 0
	}
	ratio := c.b / c.d
	if c.table == canon.SectionRectangle {
		if !atMost(ratio, 3) {
			return math.NaN()
		}
		ratio = within(ratio, 1.0/3, 2) // the ends of the table are held
	}
	a, listed, err := canon.GallopingFactor(c.table, within(ratio, 1e-3, 1e3))
	if err != nil {
		return math.NaN()
	}
	how := "The factor of galloping is taken from the table of EN 1991-1-4: "
	if !listed {
		how = "The factor of galloping is taken as EN 1991-1-4 has it for a section that it does not list: "
	}
	r.warn(secGalloping, "assumed", how+units.Format(a, units.Dimensionless)+".")
	return a
}

// Groups puts the groups that are the section's own.
func (c *section) Groups(s *scale.Set, g *group.Set) {
	g.Factors = group.Factors{Inertia: 1.5, Viscous: 1.5, Acoustic: 2, Flow: 1.5, Buckling: 2, Flutter: 3, StallPerRadian: 1}
	if g.Any(group.Streamlined) {
		g.Factors.Inertia, g.Factors.Buckling, g.Factors.Flutter = 1.15, 1.5, 1.3
		g.StallPerRadian = 1 / math.Max(s.X(scale.StallAngle), 1e-3)
	}
	if c.torsion.given {
		g.Factors.Flutter = 1.3
	}
	g.Band = group.Transition{Low: 190, High: 300, Length: group.Reynolds}
	if g.Is(group.Streamlined) {
		g.Band = group.Transition{Low: 3e5, High: 3e6, Length: group.ChordReynolds}
	}
	c.motion(s, g)
	c.still.groups(s, g)
	if g.Any(group.Flow) {
		c.flowGroups(s, g)
	}
	massDamping(s, g, c.massRatio, c.added, math.Pi/4)
}

func (c *section) motion(s *scale.Set, g *group.Set) {
	g.Drop(group.LengthReynolds)
	g.Drop(group.DisplacementSpan)
	g.Put(group.ThicknessRatio, c.d/c.b)
	if x := s.X(scale.Amplitude); !math.IsNaN(x) {
		g.Put(group.KeuleganCarpenter, 2*math.Pi*x/c.d)
	} else {
		g.Miss(group.KeuleganCarpenter, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: c.d / (2 * math.Pi), Power: 1})
	}
	tilt(s, g, math.Pi)
}

func (c *section) flowGroups(s *scale.Set, g *group.Set) {
	putOrWait(s, g, group.SpanRatio, c.d/s.X(scale.Span), scale.Span)
	switch {
	case g.Is(group.Bluff):
		c.wake.groups(s, g)
		if !g.Is(group.Elongated) && !c.torsion.inUse {
			g.Drop(group.ReducedFrequency)
		}
		c.gallopGroups(s, g)
	default:
		c.streamlinedGroups(s, g)
	}
	if !math.IsNaN(c.drag) {
		g.Put(group.DragCoefficient, c.drag)
	}
	c.torsion.groups(s, g)
	c.flowDamping(s, g)
	c.suctionPeak(s, g)
	gusts(s, g, c.d)
}

func (c *section) streamlinedGroups(s *scale.Set, g *group.Set) {
	if g.Is(group.BluntEdge) {
		c.wake.groups(s.With(scale.Length, s.X(scale.SheddingWidth)), g)
	}
	re := s.X(scale.Speed) * c.b / s.X(scale.KinematicViscosity)
	putOrWait(s, g, group.ChordReynolds, re, scale.Speed, scale.KinematicViscosity)
	putOrWait(s, g, group.BoundaryLayer, 2*displacementThickness(re)*c.b/c.d, scale.Speed, scale.KinematicViscosity)
}

// gallopGroups puts the onset of galloping, and where it lies to that of shedding.
func (c *section) gallopGroups(s *scale.Set, g *group.Set) {
	high := s.X(scale.SpeedHigh)
	if ratio := high / c.criticalU; !math.IsNaN(ratio) && !math.IsInf(ratio, 0) {
		g.Put(group.CriticalSpeedRatio, ratio)
	}
	reduced := high / (s.X(scale.FrequencyDry) * c.d)
	mass := s.X(scale.DryMass) / (s.X(scale.Density) * c.d * c.d)
	switch {
	case math.IsInf(c.gallopU, 1):
		g.Drop(group.GallopingSpeed)
	case math.IsNaN(c.galloping):
		sc := 4 * math.Pi * mass * s.X(scale.Damping)
		need := group.Need{Input: secGalloping.Path(), Unit: "1", Coefficient: 2 * sc / reduced, Power: 1}
		if !(need.Coefficient > 0) {
			need.Coefficient, need.Power = 0, 0
		}
		g.Miss(group.GallopingSpeed, need)
	case !s.Has(scale.Damping):
		g.Miss(group.GallopingSpeed, group.Need{Input: s.Needs(scale.Damping), Unit: "1", Coefficient: reduced * c.galloping / (8 * math.Pi * mass), Power: -1})
		if !(g.Need(group.GallopingSpeed).Coefficient > 0) {
			waitFor(s, g, []scale.ID{scale.Speed, scale.FrequencyDry, scale.DryMass, scale.Density}, group.GallopingSpeed)
		}
	default:
		putOrWait(s, g, group.GallopingSpeed, math.Min(high/c.gallopU, 1e6), scale.Speed, scale.FrequencyDry, scale.DryMass, scale.Density)
		if x := c.gallopU / c.criticalU; x > 0 && !math.IsInf(x, 0) {
			g.Put(group.GallopingInteraction, x)
		}
	}
}

// flowDamping puts the damping by the flow: of the plunge of an attached section
// by its lift, of a bluff one that does not gallop by −a_G; where it gallops the
// flow takes damping away, which is that hazard's matter.
func (c *section) flowDamping(s *scale.Set, g *group.Set) {
	wet := s.X(scale.DryMass) + s.X(scale.AddedMass)
	unit := s.X(scale.Density) * s.X(scale.Speed) / (4 * 2 * math.Pi * s.X(scale.FrequencyWet) * wet)
	zeta := math.NaN()
	switch {
	case g.Is(group.Lifting):
		zeta = unit * c.torsion.lift * c.b
	case g.Is(group.Circular):
		zeta = unit * c.drag * c.d
	case c.galloping <= 0:
		zeta = -unit * c.galloping * c.d
	}
	if !math.IsNaN(zeta) {
		g.Put(group.DampingFlow, zeta)
	}
}

// suctionPeak puts −Cp_min: given, of a bluff section 1.5 (sharp edges 1 to 1.5 in
// the mean, more at the corners; Blevins 1990, from memory), of a circle by its
// Reynolds number, of an attached one by its thickness and incidence.
func (c *section) suctionPeak(s *scale.Set, g *group.Set) {
	switch {
	case !math.IsNaN(c.suction):
		g.Put(group.SuctionPeak, c.suction)
	case g.Is(group.Circular):
		g.Put(group.SuctionPeak, suctionOfCylinder(g.Get(group.Reynolds)))
	case g.Is(group.Bluff):
		g.Put(group.SuctionPeak, 1.5)
	default:
		g.Put(group.SuctionPeak, foilSuction(c.d/c.b, math.Abs(s.X(scale.Incidence))))
	}
}
