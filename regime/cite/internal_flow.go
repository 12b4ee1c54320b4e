package cite

// Sources on flow inside pipes and vessels.
var (
	WiggertTijsseling2001 = &Source{ID: "wiggert-tijsseling-2001", Short: "Wiggert & Tijsseling 2001", Memory: true,
		Full: "Wiggert, D. C. & Tijsseling, A. S., Fluid transients and fluid-structure interaction in flexible liquid-filled piping, Applied Mechanics Reviews 54, 455-481, 2001", Locator: "Poisson and junction coupling, four-equation model"}
	Haaland1983 = &Source{ID: "haaland-1983", Short: "Haaland 1983", Memory: true,
		Full: "Haaland, S. E., Simple and explicit formulas for the friction factor in turbulent pipe flow, Journal of Fluids Engineering 105, 89-90, 1983", Locator: "explicit friction factor"}
	WhitePipe2006 = &Source{ID: "white-2006-pipe", Short: "White 2006, pipe flow", Memory: true,
		Full: "White, F. M., Viscous Fluid Flow, 3rd ed., McGraw-Hill, 2006", Locator: "transition of pipe flow from Re 2300; momentum factors of the laminar and the turbulent profile"}
	API618 = &Source{ID: "api-618", Short: "API 618", Memory: true,
		Full: "API Standard 618, Reciprocating Compressors for Petroleum, Chemical, and Gas Industry Services, 5th ed., American Petroleum Institute, 2007", Locator: "7.9.4.2.5.3.2, separation of mechanical natural frequencies from excitation by 20 per cent"}
	Nerem1972 = &Source{ID: "nerem-1972", Short: "Nerem, Seed & Wood 1972", Memory: true,
		Full: "Nerem, R. M., Seed, W. A. & Wood, N. B., An experimental study of the velocity distribution and transition to turbulence in the aorta, Journal of Fluid Mechanics 52, 137-160, 1972", Locator: "critical peak Reynolds number 150 to 250 times the Womersley number"}
	TimoshenkoGere1961 = &Source{ID: "timoshenko-gere-1961", Short: "Timoshenko & Gere 1961", Memory: true,
		Full: "Timoshenko, S. P. & Gere, J. M., Theory of Elastic Stability, 2nd ed., McGraw-Hill, 1961", Locator: "section 11.5, cylindrical shell under uniform external lateral pressure (von Mises)"}
	Shapiro1977 = &Source{ID: "shapiro-1977", Short: "Shapiro 1977", Memory: true,
		Full: "Shapiro, A. H., Steady flow in collapsible tubes, Journal of Biomechanical Engineering 99, 126-147, 1977", Locator: "tube law; speed index U/c"}
	CausinTube = &Source{ID: "causin-2005-tube", Short: "Causin, Gerbeau & Nobile 2005, round tube",
		Full:    "Causin P., Gerbeau J.-F., Nobile F., Added-mass effect in the design of partitioned algorithms for fluid-structure problems, Computer Methods in Applied Mechanics and Engineering 194, 4506-4527, 2005",
		Locator: "added mass of the longest wave in a plane channel; here that of a round tube, by the same potential problem", Memory: true}
)

var internalFlow = []*Source{WiggertTijsseling2001, Haaland1983, WhitePipe2006, API618, Nerem1972, TimoshenkoGere1961, Shapiro1977, CausinTube}
