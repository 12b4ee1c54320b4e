package kind

import (
	"math"

	"regimed/regime/canon"
	"regimed/regime/group"
	"regimed/regime/input"
	"regimed/regime/scale"
	"regimed/units"
)

// The fields of a generic body.
var (
	genLength     = &input.Field{Name: "length", Type: input.Quantity, Kind: units.Length, Rule: "gt=0", Doc: "characteristic length: diameter of a sphere, depth across the flow of a bluff body, chord of a streamlined one", Needed: true}
	genMass       = quantity("mass", units.Mass, "gt=0", "dry mass that moves in the mode", "density times volume")
	genVolume     = quantity("volume", units.Volume, "gt=0", "volume of the displaced fluid", "πL³/6 of a sphere")
	genAdded      = pure("added_mass_coefficient", "gte=0", "added mass over displaced mass", "1; ½ of a sphere")
	genShape      = choice("shape", "what the body is to a flow", "bluff", "bluff", "streamlined", "plate", "sphere")
	genSpan       = quantity("span", units.Length, "gt=0", "length across the flow", "")
	genThickness  = quantity("thickness", units.Length, "gt=0", "thickness of a streamlined body", "")
	genArea       = quantity("frontal_area", units.Area, "gt=0", "area on which the drag coefficient stands", "πL²/4 of a sphere, else L²")
	genDrag       = pure("drag_coefficient", "gt=0", "mean drag coefficient on the frontal area", "by shape")
	genLift       = pure("lift_coefficient", "gt=0", "r.m.s. unsteady lift coefficient", "0.3")
	genStrouhal   = pure("strouhal", "gt=0,lt=1", "Strouhal number", "by shape")
	genNext       = quantity("next_frequency", units.Frequency, "gt=0", "dry frequency of the next mode that the fluid can couple", "")
	genFlow       = quantity("flow_stiffness", units.Stiffness, "", "change of the steady flow force with the displacement, dF/dξ", "")
	genGalloping  = pure("galloping_factor", "", "a_G = −(dC_L/dα + C_D) of a bluff body; ≤ 0: it does not gallop", "")
	genDivergence = quantity("divergence_speed", units.Speed, "gt=0", "divergence speed, where it is known", "")
	genFlutter    = quantity("flutter_speed", units.Speed, "gt=0", "flutter speed, where it is known", "")
	genStall      = quantity("stall_angle", units.Angle, "gt=0,lte=1.6", "incidence at which a streamlined body stalls", "10 deg")
	genLiftSlope  = pure("lift_slope", "gt=0,lte=20", "slope of the lift coefficient of a streamlined body on its plan area, per radian", "2π/(1 + 2/aspect ratio); 2π without a span")
	genSuction    = pure("suction_peak", "gt=0", "largest suction −Cp_min", "by shape")
)

// Generic is a body for which no sharper kind exists.
var Generic = &Kind{
	Name:  "generic",
	Title: "Generic body",
	Doc:   "a body with one degree of freedom that no other kind covers, or a benchmark that gives dimensionless numbers",
	Fields: modal(genLength, genMass, SolidDensity, genVolume, genAdded, genShape, genSpan, genThickness, genArea, genDrag, genLift, genStrouhal,
		genNext, genFlow, genGalloping, genDivergence, genFlutter, genStall, genLiftSlope, genSuction),
	Directions: []string{"cross", "axial", "grazing"},
	New:        newGeneric,
}

// generic holds what a generic body solves.
type generic struct {
	shape      string
	l          float64
	added      float64 // coefficient
	massRatio  float64
	wake       wake
	flow       float64 // |dF/dξ|, NaN where not given
	galloping  float64
	divergence float64
	flutter    float64
	suction    float64
	area       float64
	drag       float64
	lift       float64 // slope of the lift coefficient times plan area over L², 0 for a bluff body
	section    float64 // displaced area of a section over L²
}

func newGeneric(r *Resolver) Physics {
	b := &generic{shape: r.c.Choice(genShape, "bluff"), massRatio: math.NaN()}
	b.body(r)
	r.closeGroups()
	r.damping()
	b.masses(r)
	r.frequencies(math.NaN(), "", r.gamma(b.viscous))
	r.interestOf()
	b.aero(r)
	return b
}

func (b *generic) body(r *Resolver) {
	r.take(scale.Length, genLength)
	b.l = r.X(scale.Length)
	r.derive(scale.ViscousLength, b.l/2, units.Length, "half the length")
	r.derive(scale.SemiChord, b.l/2, units.Length, "half the length")
	r.takeOrNeed(scale.Span, genSpan)
	r.take(scale.Thickness, genThickness)
	r.take(scale.NextFrequency, genNext)
	r.Need(scale.NextFrequency, genNext.Path())
	r.Value(scale.NextFrequency).Kind = units.Frequency
	switch b.shape {
	case "streamlined", "plate":
		r.trait(group.Streamlined)
	default:
		r.trait(group.Bluff)
	}
	if b.shape == "sphere" {
		r.trait(group.Circular)
	}
	if !r.c.Has(genShape) {
		r.warn(genShape, "assumed", "The body is taken as bluff.")
	}
	r.nearSurface(b.l)
	gap := r.X(scale.WallGap)
	if shell := r.X(scale.ShellDiameter); !math.IsNaN(shell) {
		if shell <= b.l {
			r.contradict(ShellDiameter, "The shell is no wider than the body.")
		}
		gap = math.Min((shell-b.l)/2, orInf(gap))
	}
	if !math.IsNaN(gap) {
		r.derive(scale.Gap, gap, units.Length, "nearest gap")
		r.trait(group.Confined)
	}
}

func orInf(x float64) float64 {
	if math.IsNaN(x) {
		return math.Inf(1)
	}
	return x
}

func (b *generic) masses(r *Resolver) {
	r.takeOrNeed(scale.SolidDensity, SolidDensity)
	r.plausibleSolid()
	volume, rho := r.c.X(genVolume), r.X(scale.Density)
	if math.IsNaN(volume) && b.shape == "sphere" {
		volume = math.Pi * b.l * b.l * b.l / 6
	}
	b.section = math.Pi / 4 // of a circle, where the span does not tell
	if span := r.X(scale.Span); !math.IsNaN(span) && !math.IsNaN(volume) && b.shape != "sphere" {
		b.section = volume / (span * b.l * b.l)
	}
	r.derive(scale.DisplacedMass, rho*volume, units.Mass, "ρ times the volume")
	r.Value(scale.DisplacedMass).Kind = units.Mass
	if math.IsNaN(volume) {
		r.Need(scale.DisplacedMass, genVolume.Path())
	} else {
		r.Need(scale.DisplacedMass, r.Needs(scale.Density))
	}
	r.Value(scale.DryMass).Kind = units.Mass
	if !r.take(scale.DryMass, genMass) {
		if r.closeGroups(); !r.Has(scale.DryMass) {
			r.derive(scale.DryMass, r.X(scale.SolidDensity)*volume, units.Mass, "ρ_s times the volume")
			r.Need(scale.DryMass, genMass.Path())
		}
	}
	b.massRatio = r.X(scale.DryMass) / r.X(scale.DisplacedMass)
	b.addedMass(r)
}

func (b *generic) addedMass(r *Resolver) {
	b.added = r.c.X(genAdded)
	how := "the coefficient given times the displaced mass"
	if math.IsNaN(b.added) {
		b.added, how = 1, "the displaced mass: coefficient 1"
		if b.shape == "sphere" {
			b.added, how = 0.5, "half the displaced mass, of a sphere"
		} else if r.Is(group.Fluid) {
			r.warn(genAdded, "assumed", "The added mass coefficient is taken as 1, that of a circular cylinder.")
		}
	}
	free := b.added * r.X(scale.DisplacedMass)
	r.derive(scale.AddedMassFree, free, units.Mass, how)
	confined, why := b.confinement(r)
	r.derive(scale.AddedMass, free*confined, units.Mass, how+why)
	r.closeGroups()
	for _, id := range []scale.ID{scale.AddedMass, scale.AddedMassFree} {
		r.Need(id, r.Needs(scale.DisplacedMass))
		r.Value(id).Kind = units.Mass
	}
}

// confinement is the factor of the walls on the added mass, by the circular
// cylinder as a cousin.
func (b *generic) confinement(r *Resolver) (float64, string) {
	if gap := r.X(scale.WallGap); !math.IsNaN(gap) {
		if c, err := canon.CylinderNearWall(gap / b.l); err == nil {
			return c, ", near a wall as a circular cylinder"
		}
	}
	if shell := r.X(scale.ShellDiameter) / b.l; shell > 1 {
		return (shell*shell + 1) / (shell*shell - 1), ", in a shell as a circular cylinder"
	}
	return 1, ""
}

// viscous is Γ by shape: exact for a sphere, a cousin for the others.
func (b *generic) viscous(f, nu float64) (gr, gi float64, err error) {
	s := 2 * math.Pi * f * b.l * b.l / 4 / nu
	switch b.shape {
	case "sphere":
		added, damping, err := canon.OscillatingSphere(s)
		return 2 * added, 2 * damping, err
	case "plate", "streamlined":
		return ribbon(s)
	default:
		return canon.OscillatingCylinder(s)
	}
}

// Drag coefficients by shape, on the frontal area (Blevins 1990, from memory).
var dragByShape = map[string]float64{"bluff": bluffDrag, "sphere": 0.47, "streamlined": 0.05, "plate": 0.02}

func (b *generic) aero(r *Resolver) {
	b.flow = math.Abs(r.c.X(genFlow))
	b.galloping, b.suction = r.c.X(genGalloping), r.c.X(genSuction)
	b.divergence, b.flutter = r.c.X(genDivergence), r.c.X(genFlutter)
	if !r.Any(group.Flow) {
		return
	}
	b.area = b.l * b.l
	if b.shape == "sphere" {
		b.area *= math.Pi / 4
	}
	if v := r.c.Lookup(genArea); v != nil {
		b.area = v.Q.Value
	} else if b.shape != "sphere" {
		r.warn(genArea, "assumed", "The frontal area is taken as the square of the length.")
	}
	b.drag = dragByShape[b.shape]
	if v := r.c.Lookup(genDrag); v != nil {
		b.drag = v.Q.Value
	} else {
		r.warn(genDrag, "assumed", "The drag coefficient is taken by shape: "+units.Format(b.drag, units.Dimensionless)+".")
	}
	if r.Is(group.Streamlined) {
		r.takeOr(scale.StallAngle, genStall, 10*math.Pi/180, "a thin section at moderate Reynolds number")
	}
	if r.Is(group.Bluff) && r.Is(group.Cross) {
		b.shedding(r)
	}
	b.lifting(r)
	u := r.X(scale.Speed)
	lift := b.lift * b.l * b.l * math.Abs(r.X(scale.Incidence))
	r.deflect(r.X(scale.Density)*u*u/2*math.Hypot(b.drag*b.area, lift), 1, units.Force)
}

// lifting resolves the lift slope of a streamlined body, on its plan area
// (chord times span, the square of the chord without a span).
func (b *generic) lifting(r *Resolver) {
	if !r.Is(group.Streamlined) {
		return
	}
	aspect := r.X(scale.Span) / b.l
	slope := r.c.X(genLiftSlope)
	if math.IsNaN(slope) {
		slope = 2 * math.Pi
		if !math.IsNaN(aspect) {
			slope /= 1 + 2/aspect
		}
		r.warn(genLiftSlope, "assumed", "The lift slope is taken as "+units.Format(slope, units.Dimensionless)+" per radian.")
	}
	if math.IsNaN(aspect) {
		aspect = 1
	}
	b.lift = slope * aspect
}

// liftByShape is the r.m.s. lift coefficient: a sphere's wake sheds helically and
// pulls little (0.04 to 0.08: Blevins 1990, from memory).
func liftByShape(shape string) float64 {
	if shape == "sphere" {
		return 0.06
	}
	return defaultLift
}

func (b *generic) shedding(r *Resolver) {
	b.wake = wake{shape: canon.SectionBluff, strouhal: r.c.X(genStrouhal), drag: b.drag, lift: liftByShape(b.shape), modeFactor: canon.ModeFactorSpringMounted, modes: []float64{1}, first: 1}
	if v := r.c.Lookup(genLift); v != nil {
		b.wake.lift = v.Q.Value
	} else {
		r.warn(genLift, "assumed", "The r.m.s. lift coefficient of shedding is taken by shape: "+units.Format(b.wake.lift, units.Dimensionless)+".")
	}
	added := r.X(scale.AddedMass) / r.X(scale.DisplacedMass)
	b.wake.solve(r, b.massRatio, added, b.section)
	b.wake.amplify(r, b.massRatio, added)
	if b.wake.vibrating() && !r.Is(group.Amplitude) {
		r.derive(scale.Amplitude, b.wake.amplitude*b.l, units.Length, "amplitude of the locked-in vibration")
	}
}

// Groups puts the groups that are the body's own.
func (b *generic) Groups(s *scale.Set, g *group.Set) {
	factor := 2.0
	if b.shape == "sphere" {
		factor = 1.15
	}
	g.Factors = group.Factors{Inertia: 1.5, Viscous: factor, Acoustic: factor, Flow: 2, Buckling: 1.5, Flutter: 1.5, StallPerRadian: 1 / math.Max(s.X(scale.StallAngle), 1e-3)}
	if !s.Has(scale.StallAngle) {
		g.StallPerRadian = 1
	}
	g.Band = group.Transition{Low: 190, High: 300, Length: group.Reynolds}
	if g.Is(group.Streamlined) || !g.Is(group.Cross) {
		g.Band = group.Transition{Low: 3e5, High: 3e6, Length: group.Reynolds}
	}
	b.motion(s, g)
	if !g.Is(group.Fluid) {
		return
	}
	g.Traits |= group.ViscousSolved
	b.still(s, g)
	g.Put(group.ModeCoupling, 1)
	if g.Any(group.Flow) {
		b.flowGroups(s, g)
	}
	massDamping(s, g, b.massRatio, b.added, b.section)
}

func (b *generic) motion(s *scale.Set, g *group.Set) {
	if x := s.X(scale.Amplitude); !math.IsNaN(x) {
		g.Put(group.KeuleganCarpenter, 2*math.Pi*x/b.l)
	} else {
		g.Miss(group.KeuleganCarpenter, group.Need{Input: s.Needs(scale.Amplitude), Unit: "m", Coefficient: b.l / (2 * math.Pi), Power: 1})
	}
	g.Drop(group.DisplacementSpan)
	g.Drop(group.LengthReynolds)
	if t := s.X(scale.Thickness); !math.IsNaN(t) {
		g.Put(group.ThicknessRatio, t/b.l)
	}
}

func (b *generic) still(s *scale.Set, g *group.Set) {
	fw, c := s.X(scale.FrequencyWet), s.X(scale.SoundSpeed)
	viscousGroups(s, g, b.viscous)
	solve := canon.SoundCylinder
	if b.shape == "sphere" {
		solve = canon.SoundSphere
	}
	soundGroups(s, g, math.Pi*fw*b.l/c, solve)
	if g.Is(group.NearSurface) {
		// dipole and image: exact for a sphere to the third power of a/d
		image(g, math.Pow(b.l/2/s.X(scale.Depth), 3)*3/8)
	}
	rarefaction(s, g, b.l)
}

func (b *generic) flowGroups(s *scale.Set, g *group.Set) {
	if g.Is(group.Bluff | group.Cross) {
		b.wake.groups(s, g)
		g.Drop(group.ReducedFrequency)
	}
	g.Put(group.DragCoefficient, b.drag)
	g.Put(group.ThicknessRatio, s.X(scale.Thickness)/b.l)
	if !s.Has(scale.Thickness) {
		g.Drop(group.ThicknessRatio)
	}
	putOrWait(s, g, group.SpanRatio, b.l/s.X(scale.Span), scale.Span)
	b.reaction(s, g)
	b.instabilities(s, g)
	b.suctionPeak(s, g)
	if g.Is(group.Streamlined) {
		b.boundaryLayer(s, g)
	}
}

// reaction puts the flow stiffness, where it was given, and the flow damping.
func (b *generic) reaction(s *scale.Set, g *group.Set) {
	omega := 2 * math.Pi * s.X(scale.FrequencyWet)
	// along the stream by drag, across it by lift: ρU C_D A ξ̇, ½ρU C_Lα A ξ̇
	damper := s.X(scale.Density) * s.X(scale.Speed) * math.Max(b.drag*b.area, b.lift*b.l*b.l/2)
	wet := s.X(scale.DryMass) + s.X(scale.AddedMass)
	if zeta := damper / (2 * omega * wet); !math.IsNaN(zeta) {
		g.Put(group.DampingFlow, zeta)
	}
	if math.IsNaN(b.flow) {
		g.Miss(group.PseudoStatic, group.Need{Input: genFlow.Path(), Unit: "N/m"})
		return
	}
	k := s.X(scale.DryMass) * math.Pow(2*math.Pi*s.X(scale.FrequencyDry), 2)
	putOrWait(s, g, group.FlowStiffness, b.flow/k, scale.DryMass, scale.FrequencyDry)
	putOrWait(s, g, group.PseudoStatic, omega*damper/b.flow, scale.FrequencyWet, scale.Speed, scale.Density)
}

// instabilities puts the speeds of instability that are given, and waits for
// those that the shape can have.
func (b *generic) instabilities(s *scale.Set, g *group.Set) {
	high := s.X(scale.SpeedHigh)
	onset := func(id group.ID, f *input.Field, critical float64) {
		switch {
		case !math.IsNaN(critical):
			g.Put(id, high/critical)
		case s.Has(scale.SpeedHigh):
			g.Miss(id, group.Need{Input: f.Path(), Unit: "m/s", Coefficient: high, Power: -1})
		default:
			g.Miss(id, group.Need{Input: f.Path(), Unit: "m/s"})
		}
	}
	if g.Is(group.Streamlined) {
		onset(group.DivergenceSpeed, genDivergence, b.divergence)
		onset(group.FlutterSpeed, genFlutter, b.flutter)
		return
	}
	b.gallop(s, g, high)
}

// gallop puts the galloping speed ratio: onset 2 Sc f b/a_G.
func (b *generic) gallop(s *scale.Set, g *group.Set, high float64) {
	if b.shape == "sphere" || !g.Is(group.Cross) {
		return
	}
	switch {
	case math.IsNaN(b.galloping):
		g.Miss(group.GallopingSpeed, group.Need{Input: genGalloping.Path(), Unit: "1"})
	case b.galloping <= 0:
		g.Put(group.GallopingSpeed, 0)
	case !s.Has(scale.Damping):
		g.Miss(group.GallopingSpeed, group.Need{Input: s.Needs(scale.Damping), Unit: "1"})
	default:
		sc := 4 * math.Pi * b.massRatio * b.section * s.X(scale.Damping)
		onset := 2 * sc * s.X(scale.FrequencyDry) * b.l / b.galloping
		putOrWait(s, g, group.GallopingSpeed, high/math.Max(onset, 1e-9*high), scale.SpeedHigh, scale.FrequencyDry, scale.DryMass, scale.DisplacedMass)
	}
}

// suctionPeak puts −Cp_min: given, or by shape; a streamlined body at no
// incidence as an ellipse of its thickness, (1 + τ)² − 1.
func (b *generic) suctionPeak(s *scale.Set, g *group.Set) {
	switch {
	case !math.IsNaN(b.suction):
		g.Put(group.SuctionPeak, b.suction)
	case b.shape == "sphere":
		g.Put(group.SuctionPeak, 1.25)
	case g.Is(group.Bluff):
		g.Put(group.SuctionPeak, 1.5)
	case s.X(scale.Incidence) == 0 && g.Has(group.ThicknessRatio):
		tau := g.Get(group.ThicknessRatio)
		g.Put(group.SuctionPeak, (1+tau)*(1+tau)-1)
	default:
		g.Miss(group.SuctionPeak, group.Need{Input: genSuction.Path(), Unit: "1"})
	}
}

func (b *generic) boundaryLayer(s *scale.Set, g *group.Set) {
	re := g.Get(group.Reynolds)
	thickness := s.X(scale.Thickness)
	switch {
	case math.IsNaN(re):
		g.Miss(group.BoundaryLayer, g.Need(group.Reynolds))
	case math.IsNaN(thickness):
		g.Miss(group.BoundaryLayer, group.Need{Input: genThickness.Path(), Unit: "m"})
	default:
		g.Put(group.BoundaryLayer, 2*displacementThickness(re)*b.l/thickness)
	}
}
