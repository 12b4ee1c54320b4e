package cite

// Sources on the method itself and coupled solution schemes.
var (
	Causin2005 = &Source{
		ID: "causin-2005", Short: "Causin, Gerbeau & Nobile 2005",
		Full:    "Causin P., Gerbeau J.-F., Nobile F., Added-mass effect in the design of partitioned algorithms for fluid-structure problems, Computer Methods in Applied Mechanics and Engineering 194, 4506-4527, 2005",
		Locator: "instability of the explicit scheme; relaxation of the Dirichlet-Neumann iterations", Memory: true,
	}
	Forster2007 = &Source{
		ID: "forster-2007", Short: "Förster, Wall & Ramm 2007",
		Full:    "Förster C., Wall W.A., Ramm E., Artificial added mass instabilities in sequential staggered coupling of nonlinear structures and incompressible viscous flows, Computer Methods in Applied Mechanics and Engineering 196, 1278-1293, 2007",
		Locator: "instability constants of sequential schemes", Memory: true,
	}
	VanBrummelen2009 = &Source{
		ID: "van-brummelen-2009", Short: "van Brummelen 2009",
		Full:    "van Brummelen E.H., Added mass effects of compressible and incompressible flows in fluid-structure interaction, Journal of Applied Mechanics 76, 021206, 2009",
		Locator: "added mass of a compressible fluid in one time step", Memory: true,
	}
	HagoodVonFlotow1991 = &Source{
		ID: "hagood-von-flotow-1991", Short: "Hagood & von Flotow 1991",
		Full:    "Hagood N.W., von Flotow A., Damping of structural vibrations with piezoelectric materials and passive electrical networks, Journal of Sound and Vibration 146, 243-268, 1991",
		Locator: "resistive shunting: generalised coupling and loss factor", Memory: true,
	}
)

var method = []*Source{Causin2005, Forster2007, VanBrummelen2009, HagoodVonFlotow1991}
