package group

// Traits are what a verdict may depend on besides numbers.
type Traits uint64

// The traits. Fluid states first: a case may be in several.
const (
	Fluid         Traits = 1 << iota // there is a fluid
	Still                            // it is at rest but for the motion
	Cross                            // mean flow across the structure
	Axial                            // mean flow along it
	Grazing                          // mean flow over a surface
	Internal                         // mean flow inside
	Waves                            // surface waves
	Contained                        // fluid held by the structure
	Liquid                           // the fluid is a liquid
	Gas                              // the fluid is a gas
	Bluff                            // the flow separates by the shape
	Streamlined                      // the flow stays attached
	Circular                         // a circle to the cross flow
	Confined                         // a wall, a shell or a neighbour is near
	NearSurface                      // a free surface within ten lengths
	Film                             // a wall nearer than a width: a film
	ViscousSolved                    // the kind has a viscous Γ
	Cantilever                       // clamped at one end, free elsewhere
	Restrained                       // supports that hold the ends in the axis or the plane
	Uniform                          // a uniform section in a uniform fluid
	ModesDerived                     // higher frequencies follow from the kind
	StaticOnly                       // no frequency, and none is of interest
	Cavity                           // a closed cavity behind the structure
	Amplitude                        // the amplitude of the motion was given
	Flexible                         // the structure bends: slopes and strains exist
	PanelLike                        // a flush panel: no separation of its own
	Piercing                         // the body pierces the free surface
	Sloshing                         // the liquid of a tank, with a free surface
	Spectrum                         // the excitation is a spectrum, given by its acceleration at the mode
	Elongated                        // a section more than twice as long along the flow as it is deep
	BluntEdge                        // a streamlined body that sheds from a blunt trailing edge
	Lifting                          // lift at incidence is what the flow does to the body
	Array                            // a tube among tubes in cross flow
	WakeOfBody                       // the structure lies in the wake of a bluff body that holds it
	TwoPhase                         // the fluid is a mixture of a liquid and a gas
	Duct                             // side walls between which sound can stand across the flow
	Neighboured                      // another cylinder stands near, across or along the flow
	Column                           // a column of fluid inside a tube
	Pulsatile                        // a pulse runs through a compliant tube
	Active                           // a piezoelectric part or a moving coil
	Dielectric                       // a membrane of dielectric elastomer
	Shock                            // a shock wave meets the structure
)

// Flow are the traits that mean a mean flow.
const Flow = Cross | Axial | Grazing | Internal

// TraitName pairs a trait with its name in the catalogue.
type TraitName struct {
	Trait Traits
	Name  string
}

// TraitNames lists the traits by name.
var TraitNames = []TraitName{
	{Fluid, "fluid"}, {Still, "still"}, {Cross, "cross-flow"}, {Axial, "axial-flow"}, {Grazing, "grazing-flow"}, {Internal, "internal-flow"},
	{Waves, "waves"}, {Contained, "contained"}, {Liquid, "liquid"}, {Gas, "gas"}, {Bluff, "bluff"}, {Streamlined, "streamlined"},
	{Circular, "circular"}, {Confined, "confined"}, {NearSurface, "near-surface"}, {Film, "film"}, {ViscousSolved, "viscous-solution"},
	{Cantilever, "cantilever"}, {Restrained, "restrained"}, {Uniform, "uniform"}, {ModesDerived, "modes-derived"}, {StaticOnly, "static-only"},
	{Cavity, "cavity"}, {Amplitude, "amplitude-given"}, {Flexible, "flexible"}, {PanelLike, "panel"}, {Piercing, "surface-piercing"},
	{Sloshing, "sloshing"}, {Spectrum, "spectrum"}, {Elongated, "elongated"}, {BluntEdge, "blunt-edge"}, {Lifting, "lifting"},
	{Array, "array"}, {WakeOfBody, "wake-of-body"}, {TwoPhase, "two-phase"}, {Duct, "duct"}, {Neighboured, "neighboured"},
	{Column, "column"}, {Pulsatile, "pulsatile"}, {Active, "active"}, {Dielectric, "dielectric"}, {Shock, "shock"},
}

// Is reports whether every one of the traits holds.
func (t Traits) Is(want Traits) bool { return t&want == want }

// Any reports whether at least one of the traits holds.
func (t Traits) Any(want Traits) bool { return t&want != 0 }
