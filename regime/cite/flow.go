package cite

// Sources on flow, its forces and instabilities, waves and free surface.
var (
	Roshko1954 = &Source{
		ID: "roshko-1954", Short: "Roshko 1954",
		Full:    "Roshko A., On the development of turbulent wakes from vortex streets, NACA Report 1191, 1954",
		Locator: "Strouhal number against Reynolds number", Memory: true,
	}
	Williamson1996 = &Source{
		ID: "williamson-1996", Short: "Williamson 1996",
		Full:    "Williamson C.H.K., Vortex dynamics in the cylinder wake, Annual Review of Fluid Mechanics 28, 477-539, 1996",
		Locator: "onset of shedding at Re 46 to 49", Memory: true,
	}
	Bearman1969 = &Source{
		ID: "bearman-1969", Short: "Bearman 1969",
		Full:    "Bearman P.W., On vortex shedding from a circular cylinder in the critical Reynolds number regime, Journal of Fluid Mechanics 37, 577-585, 1969",
		Locator: "Strouhal number 0.46 in the critical range", Memory: true,
	}
	Okajima1982 = &Source{
		ID: "okajima-1982", Short: "Okajima 1982",
		Full:    "Okajima A., Strouhal numbers of rectangular cylinders, Journal of Fluid Mechanics 123, 379-398, 1982",
		Locator: "two shedding frequencies at side ratios between 2 and 3.5", Memory: true,
	}
	Facchinetti2004 = &Source{
		ID: "facchinetti-2004", Short: "Facchinetti, de Langre & Biolley 2004",
		Full:    "Facchinetti M.L., de Langre E., Biolley F., Coupling of structure and wake oscillators in vortex-induced vibrations, Journal of Fluids and Structures 19, 123-140, 2004",
		Locator: "acceleration coupling, A = 12, C_L0 = 0.3", Memory: true,
	}
	DeLangre2006 = &Source{
		ID: "de-langre-2006", Short: "de Langre 2006",
		Full:    "de Langre E., Frequency lock-in is caused by coupled-mode flutter, Journal of Fluids and Structures 22, 783-791, 2006",
		Locator: "range of coupled-mode flutter of the linear pair", Memory: true,
	}
	SkopGriffin1975 = &Source{
		ID: "skop-griffin-1975", Short: "Skop & Griffin 1975",
		Full:    "Skop R.A., Griffin O.M., On a theory for the vortex-excited oscillations of flexible cylindrical structures, Journal of Sound and Vibration 41, 263-274, 1975",
		Locator: "peak amplitude against response parameter and mode factor", Memory: true,
	}
	GovardhanWilliamson2006 = &Source{
		ID: "govardhan-williamson-2006", Short: "Govardhan & Williamson 2006",
		Full:    "Govardhan R.N., Williamson C.H.K., Defining the 'modified Griffin plot' in vortex-induced vibration: revealing the effect of Reynolds number using controlled damping, Journal of Fluid Mechanics 561, 147-180, 2006",
		Locator: "fit of the peak amplitude to mass-damping and Reynolds number", Memory: true,
	}
	Theodorsen1935 = &Source{
		ID: "theodorsen-1935", Short: "Theodorsen 1935",
		Full:    "Theodorsen T., General theory of aerodynamic instability and the mechanism of flutter, NACA Report 496, 1935",
		Locator: "C(k) and its table", Memory: true,
	}
	TheodorsenGarrick1940 = &Source{
		ID: "theodorsen-garrick-1940", Short: "Theodorsen & Garrick 1940",
		Full:    "Theodorsen T., Garrick I.E., Mechanism of flutter: a theoretical and experimental investigation of the flutter problem, NACA Report 685, 1940",
		Locator: "bending-torsion case", Memory: true,
	}
	HodgesPierce2011 = &Source{
		ID: "hodges-pierce-2011", Short: "Hodges & Pierce 2011",
		Full:    "Hodges D.H., Pierce G.A., Introduction to Structural Dynamics and Aeroelasticity, 2nd edition, Cambridge University Press, 2011",
		Locator: "worked flutter of a two-degree section, U/(bω_α) 2.17 to 2.19", Memory: true,
	}
	GregoryPaidoussis1966 = &Source{
		ID: "gregory-paidoussis-1966", Short: "Gregory & Païdoussis 1966",
		Full:    "Gregory R.W., Païdoussis M.P., Unstable oscillation of tubular cantilevers conveying fluid, Proceedings of the Royal Society A 293, 512-527, 1966",
		Locator: "critical speed against mass ratio", Memory: true,
	}
	Paidoussis1998 = &Source{
		ID: "paidoussis-1998", Short: "Païdoussis 1998",
		Full:    "Païdoussis M.P., Fluid-Structure Interactions: Slender Structures and Axial Flow, volume 1, Academic Press, 1998",
		Locator: "chapter 3, pipes conveying fluid", Memory: true,
	}
	Eloy2007 = &Source{
		ID: "eloy-2007", Short: "Eloy, Souilliez & Schouveiler 2007",
		Full:    "Eloy C., Souilliez C., Schouveiler L., Flutter of a rectangular plate, Journal of Fluids and Structures 23, 904-919, 2007",
		Locator: "threshold of plates of finite width, against experiments", Memory: true,
	}
	Eloy2008 = &Source{
		ID: "eloy-2008", Short: "Eloy, Lagrange, Souilliez & Schouveiler 2008",
		Full:    "Eloy C., Lagrange R., Souilliez C., Schouveiler L., Aeroelastic instability of cantilevered flexible plates in uniform flow, Journal of Fluid Mechanics 611, 97-106, 2008",
		Locator: "threshold against mass ratio", Memory: true,
	}
	DenHartog1956 = &Source{
		ID: "den-hartog-1956", Short: "Den Hartog 1956",
		Full:    "Den Hartog J.P., Mechanical Vibrations, 4th edition, McGraw-Hill, 1956",
		Locator: "galloping of transmission lines", Memory: true,
	}
	Connors1970 = &Source{
		ID: "connors-1970", Short: "Connors 1970",
		Full:    "Connors H.J., Fluidelastic vibration of tube arrays excited by cross flow, ASME Symposium on Flow-Induced Vibration in Heat Exchangers, 42-56, 1970",
		Locator: "one row, K = 9.9", Memory: true,
	}
	PettigrewTaylor1991 = &Source{
		ID: "pettigrew-taylor-1991", Short: "Pettigrew & Taylor 1991",
		Full:    "Pettigrew M.J., Taylor C.E., Fluidelastic instability of heat exchanger tube bundles: review and design recommendations, Journal of Pressure Vessel Technology 113, 242-256, 1991",
		Locator: "design recommendation K = 3.0", Memory: true,
	}
	Joukowsky1898 = &Source{
		ID: "joukowsky-1898", Short: "Joukowsky 1898",
		Full:    "Joukowsky N., Über den hydraulischen Stoß in Wasserleitungsröhren, Mémoires de l'Académie Impériale des Sciences de St.-Pétersbourg, 1898-1900",
		Locator: "pressure rise at sudden closure", Memory: true,
	}
	Korteweg1878 = &Source{
		ID: "korteweg-1878", Short: "Korteweg 1878",
		Full:    "Korteweg D.J., Über die Fortpflanzungsgeschwindigkeit des Schalles in elastischen Röhren, Annalen der Physik 241, 525-542, 1878",
		Locator: "wave speed in an elastic tube", Memory: true,
	}
	WylieStreeter1993 = &Source{
		ID: "wylie-streeter-1993", Short: "Wylie & Streeter 1993",
		Full:    "Wylie E.B., Streeter V.L., Fluid Transients in Systems, Prentice-Hall, 1993",
		Locator: "chapter 1, wave speed and its support conditions", Memory: true,
	}
	Skalak1956 = &Source{
		ID: "skalak-1956", Short: "Skalak 1956",
		Full:    "Skalak R., An extension of the theory of water hammer, Transactions of the ASME 78, 105-116, 1956",
		Locator: "front of a sudden closure: dispersion by radial inertia", Memory: true,
	}
	Moens1878 = &Source{
		ID: "moens-1878", Short: "Moens 1878",
		Full:    "Moens A.I., Die Pulscurve, Brill, Leiden, 1878",
		Locator: "pulse wave speed", Memory: true,
	}
	WomersleyWave1957 = &Source{
		ID: "womersley-1957", Short: "Womersley 1957",
		Full:    "Womersley J.R., Oscillatory flow in arteries: the constrained elastic tube as a model of arterial flow and pulse transmission, Physics in Medicine and Biology 2, 178-187, 1957",
		Locator: "phase speed and attenuation of the constrained tube", Memory: true,
	}
	Glauert1928 = &Source{
		ID: "glauert-1928", Short: "Glauert 1928",
		Full:    "Glauert H., The effect of compressibility on the lift of an aerofoil, Proceedings of the Royal Society A 118, 113-119, 1928",
		Locator: "factor 1/√(1−M²)", Memory: true,
	}
	Liepmann1957 = &Source{
		ID: "liepmann-roshko-1957", Short: "Liepmann & Roshko 1957",
		Full:    "Liepmann H.W., Roshko A., Elements of Gasdynamics, Wiley, 1957",
		Locator: "isentropic relations; wavy wall in subsonic flow", Memory: true,
	}
	Airy1845 = &Source{
		ID: "airy-1845", Short: "Airy 1845",
		Full:    "Airy G.B., Tides and waves, Encyclopaedia Metropolitana, 1845",
		Locator: "dispersion at finite depth", Memory: true,
	}
	DeanDalrymple1991 = &Source{
		ID: "dean-dalrymple-1991", Short: "Dean & Dalrymple 1991",
		Full:    "Dean R.G., Dalrymple R.A., Water Wave Mechanics for Engineers and Scientists, World Scientific, 1991",
		Locator: "dispersion; second-order elevation; Ursell number", Memory: true,
	}
	MacCamyFuchs1954 = &Source{
		ID: "maccamy-fuchs-1954", Short: "MacCamy & Fuchs 1954",
		Full:    "MacCamy R.C., Fuchs R.A., Wave forces on piles: a diffraction theory, Beach Erosion Board Technical Memorandum 69, 1954",
		Locator: "force on a circular pile", Memory: true,
	}
	Abramson1966 = &Source{
		ID: "abramson-1966", Short: "Abramson 1966",
		Full:    "Abramson H.N. (ed.), The Dynamic Behavior of Liquids in Moving Containers, NASA SP-106, 1966",
		Locator: "mechanical analogues of rectangular and circular tanks", Memory: true,
	}
	DennisChang1970 = &Source{
		ID: "dennis-chang-1970", Short: "Dennis & Chang 1970",
		Full:    "Dennis S.C.R., Chang G.-Z., Numerical solutions for steady flow past a circular cylinder at Reynolds numbers up to 100, Journal of Fluid Mechanics 42, 471-489, 1970",
		Locator: "drag coefficients at Re 5 to 40", Memory: true,
	}
	Kaplun1957 = &Source{
		ID: "kaplun-1957", Short: "Kaplun 1957",
		Full:    "Kaplun S., Low Reynolds number flow past a circular cylinder, Journal of Mathematics and Mechanics 6, 595-603, 1957",
		Locator: "drag to the third order in the logarithm", Memory: true,
	}
	Wieselsberger1921 = &Source{
		ID: "wieselsberger-1921", Short: "Wieselsberger 1921",
		Full:    "Wieselsberger C., Neuere Feststellungen über die Gesetze des Flüssigkeits- und Luftwiderstandes, Physikalische Zeitschrift 22, 321-328, 1921",
		Locator: "drag of circular cylinders, Re 4 to 8e5", Memory: true,
	}
	Roshko1961 = &Source{
		ID: "roshko-1961", Short: "Roshko 1961",
		Full:    "Roshko A., Experiments on the flow past a circular cylinder at very high Reynolds number, Journal of Fluid Mechanics 10, 345-356, 1961",
		Locator: "drag and shedding at Re 1e6 to 1e7", Memory: true,
	}
	Blasius1908 = &Source{
		ID: "blasius-1908", Short: "Blasius 1908",
		Full:    "Blasius H., Grenzschichten in Flüssigkeiten mit kleiner Reibung, Zeitschrift für Mathematik und Physik 56, 1-37, 1908",
		Locator: "laminar layer of the flat plate", Memory: true,
	}
)

var flow = []*Source{
	Roshko1954, Williamson1996, Bearman1969, Okajima1982,
	Facchinetti2004, DeLangre2006, SkopGriffin1975, GovardhanWilliamson2006,
	Theodorsen1935, TheodorsenGarrick1940, HodgesPierce2011,
	GregoryPaidoussis1966, Paidoussis1998, Eloy2007, Eloy2008, DenHartog1956,
	Connors1970, PettigrewTaylor1991,
	Joukowsky1898, Korteweg1878, WylieStreeter1993, Skalak1956, Moens1878, WomersleyWave1957,
	Glauert1928, Liepmann1957,
	Airy1845, DeanDalrymple1991, MacCamyFuchs1954, Abramson1966,
	DennisChang1970, Kaplun1957, Wieselsberger1921, Roshko1961, Blasius1908,
}
