package solid

import (
	"slices"

	"regimed/regime/cite"
)

// Units of the table.
const (
	giga = 1e9
	mega = 1e6
)

// catalogue is every material, in the order in which it is shown: metals,
// minerals, laminates, plastics, rubbers, films and papers, the materials of
// small devices, tissue and wood, ice, and the piezoelectric ones. All values
// are typical and from memory.
var catalogue = []*Material{
	typical("steel", "structural steel", 7850, 210*giga, 0.30, 1.2e-3,
		"E within 3 %; linear to the yield of a 250 MPa grade"),
	typical("stainless-steel", "stainless steel (austenitic)", 8000, 195*giga, 0.29, 1.0e-3,
		"E within 4 %; the yield is gradual, from 200 MPa"),
	typical("aluminium", "aluminium alloy", 2700, 70*giga, 0.33, 3.0e-3,
		"E within 4 %; linear to the yield of a 210 MPa temper"),
	typical("titanium", "titanium alloy", 4450, 112*giga, 0.33, 7.0e-3,
		"E within 6 %; strong alloys, commercially pure grades yield at 3e-3"),
	typical("copper", "copper", 8940, 120*giga, 0.34, 5.0e-4,
		"E within 8 %; annealed copper yields at 60 MPa, cold-worked at five times that"),
	typical("brass", "brass", 8500, 105*giga, 0.34, 1.2e-3,
		"E within 6 %"),
	typical("concrete", "concrete", 2400, 30*giga, 0.20, 1.0e-4,
		"E within 30 % by strength and aggregate; cracks in tension at this strain, in compression about linear to four times that"),
	typical("glass", "glass (soda-lime)", 2500, 70*giga, 0.23, 6.0e-4,
		"E within 4 %; breaks at some 40 MPa, by the state of its surface"),
	typical("grp", "glass-reinforced plastic", 1800, 20*giga, 0.28, 3.0e-3,
		"woven laminate in its plane; E within 40 % by fibre content; first cracks of the resin at this strain"),
	typical("cfrp", "carbon-fibre-reinforced plastic (quasi-isotropic)", 1600, 55*giga, 0.31, 6.0e-3,
		"in the plane of the laminate; E within 20 %"),
	typical("pvc", "PVC (rigid)", 1400, 3.0*giga, 0.39, 1.0e-2,
		"E within 20 % for short loads at 20 °C, less by half over years; viscoelastic"),
	typical("hdpe", "high-density polyethylene", 955, 0.9*giga, 0.43, 1.0e-2,
		"E within 25 % for short loads at 20 °C, a quarter of it over years; viscoelastic"),
	typical("ptfe", "PTFE", 2170, 0.5*giga, 0.46, 2.0e-2,
		"E within 30 %; creeps"),
	typical("rubber", "rubber (natural, soft)", 1000, 2.0*mega, 0.4995, 0.2,
		"E from 1 to 5 MPa by hardness, more at high frequency; nearly incompressible; loss factor 0.05 to 0.2"),
	typical("silicone", "silicone rubber", 1100, 1.5*mega, 0.4995, 0.2,
		"E from 0.5 to 5 MPa by hardness; nearly incompressible"),
	typical("pet-film", "PET film (biaxially stretched)", 1390, 4.5*giga, 0.38, 1.5e-2,
		"E within 15 %, along and across the web"),
	typical("paper-cone", "paper (loudspeaker cone)", 600, 2.0*giga, 0.30, 5.0e-3,
		"E within 50 % by pulp, pressing and humidity; anisotropic"),
	typical("silicon", "silicon", 2330, 160*giga, 0.22, 5.0e-3,
		"polycrystalline; single crystals 130 to 188 GPa by direction; brittle, strength by the surface"),
	typical("silicon-nitride", "silicon nitride (film)", 3100, 250*giga, 0.25, 5.0e-3,
		"low-pressure deposited film, often under 0.1 to 1 GPa of tension; sintered parts 3200 kg/m³ and 310 GPa"),
	typical("arterial-wall", "arterial wall", 1060, 0.5*mega, 0.49, 5.0e-2,
		"incremental modulus at physiological stretch, 0.2 to 1.5 MPa by artery and age; stiffens beyond this strain", cite.FungCirculation),
	typical("wood", "softwood (along the grain)", 480, 11*giga, 0.37, 4.0e-3,
		"E within 30 %; across the grain 20 to 30 times softer"),
	typical("ice", "ice", 917, 9.3*giga, 0.33, 1.0e-4,
		"polycrystalline, for fast loads at −10 °C; breaks in tension at this strain, creeps when slow"),
	typical("pzt", "PZT ceramic", 7700, 62*giga, 0.31, 3.0e-4,
		"soft grade, electrodes short-circuited; stiffer by a third with open electrodes; beyond this strain the domains switch"),
	typical("pvdf", "PVDF film", 1780, 2.5*giga, 0.35, 2.0e-2,
		"stretched and poled film; E within 30 %"),
}

// typical is a row of the catalogue; further names sources beside the common
// one.
func typical(name, title string, ρ, E, ν, strain float64, note string, further ...*cite.Source) *Material {
	return &Material{
		Name: name, Title: title, Density: ρ, Young: E, Poisson: ν, LinearStrain: strain,
		Typical: true, Note: note,
		Sources: append([]*cite.Source{cite.TypicalSolids}, further...),
	}
}

// All lists the materials in the order of the catalogue.
func All() []*Material { return slices.Clone(catalogue) }

// Find returns the material of that name, or nil.
func Find(name string) *Material {
	for _, m := range catalogue {
		if m.Name == name {
			return m
		}
	}
	return nil
}

// Names lists the names in the order of the catalogue.
func Names() []string {
	names := make([]string, len(catalogue))
	for i, m := range catalogue {
		names[i] = m.Name
	}
	return names
}
