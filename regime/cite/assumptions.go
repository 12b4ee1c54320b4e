package cite

// Sources on the thresholds and judgements of the assumptions.
var (
	Blevins1990 = &Source{ID: "blevins-1990", Short: "Blevins 1990", Memory: true,
		Full: "Blevins, R. D., Flow-Induced Vibration, 2nd ed., Van Nostrand Reinhold, 1990", Locator: "ch. 3, vortex-induced vibration: Strouhal numbers of sections"}
	GadElHak1999 = &Source{ID: "gad-el-hak-1999", Short: "Gad-el-Hak 1999", Memory: true,
		Full: "Gad-el-Hak, M., The fluid mechanics of microdevices, Journal of Fluids Engineering 121, 5-33, 1999", Locator: "flow regimes by Knudsen number"}
	SumerFredsoe2006 = &Source{ID: "sumer-fredsoe-2006", Short: "Sumer & Fredsøe 2006", Memory: true,
		Full: "Sumer, B. M. & Fredsøe, J., Hydrodynamics Around Cylindrical Structures, revised ed., World Scientific, 2006", Locator: "ch. 3, oscillatory flow by KC; ch. 1 and 2, steady flow by Re"}
	Schlichting1979 = &Source{ID: "schlichting-1979", Short: "Schlichting 1979", Memory: true,
		Full: "Schlichting, H., Boundary-Layer Theory, 7th ed., McGraw-Hill, 1979", Locator: "ch. 7 and 21, flat plate"}
	Batchelor1967 = &Source{ID: "batchelor-1967", Short: "Batchelor 1967", Memory: true,
		Full: "Batchelor, G. K., An Introduction to Fluid Dynamics, Cambridge University Press, 1967", Locator: "§4.3 surface tension, §5.13 oscillating boundary layer, §6.4 added mass"}
	Paidoussis2016 = &Source{ID: "paidoussis-2016", Short: "Païdoussis 2016", Memory: true,
		Full: "Païdoussis, M. P., Fluid-Structure Interactions: Slender Structures and Axial Flow, vol. 2, 2nd ed., Academic Press, 2016", Locator: "ch. 8, cylinders in axial flow"}
	PaidoussisPriceDeLangre2011 = &Source{ID: "paidoussis-price-delangre-2011", Short: "Païdoussis, Price & de Langre 2011", Memory: true,
		Full: "Païdoussis, M. P., Price, S. J. & de Langre, E., Fluid-Structure Interactions: Cross-Flow-Induced Instabilities, Cambridge University Press, 2011"}
	BisplinghoffAshleyHalfman1955 = &Source{ID: "bisplinghoff-ashley-halfman-1955", Short: "Bisplinghoff, Ashley & Halfman 1955", Memory: true,
		Full: "Bisplinghoff, R. L., Ashley, H. & Halfman, R. L., Aeroelasticity, Addison-Wesley, 1955", Locator: "ch. 8, divergence of a section"}
	Dowell1975 = &Source{ID: "dowell-1975", Short: "Dowell 1975", Memory: true,
		Full: "Dowell, E. H., Aeroelasticity of Plates and Shells, Noordhoff, 1975", Locator: "flutter of simply supported panels by piston theory, number of modes; subsonic divergence"}
	Reynolds1886 = &Source{ID: "reynolds-1886", Short: "Reynolds 1886", Memory: true,
		Full: "Reynolds, O., On the theory of lubrication, Philosophical Transactions of the Royal Society 177, 157-234, 1886"}
	Timoshenko1974 = &Source{ID: "timoshenko-1974", Short: "Timoshenko, Young & Weaver 1974", Memory: true,
		Full: "Timoshenko, S., Young, D. H. & Weaver, W., Vibration Problems in Engineering, 4th ed., Wiley, 1974", Locator: "ch. 5, shear and rotary inertia"}
	Brennen1995 = &Source{ID: "brennen-1995", Short: "Brennen 1995", Memory: true,
		Full: "Brennen, C. E., Cavitation and Bubble Dynamics, Oxford University Press, 1995", Locator: "ch. 1 and 8"}
	KinslerFrey2000 = &Source{ID: "kinsler-2000", Short: "Kinsler et al. 2000", Memory: true,
		Full: "Kinsler, L. E., Frey, A. R., Coppens, A. B. & Sanders, J. V., Fundamentals of Acoustics, 4th ed., Wiley, 2000", Locator: "ch. 8, thermoviscous walls"}
	Landau1987 = &Source{ID: "landau-lifshitz-1987", Short: "Landau & Lifshitz 1987", Memory: true,
		Full: "Landau, L. D. & Lifshitz, E. M., Fluid Mechanics, 2nd ed., Pergamon, 1987", Locator: "§24, oscillatory motion in a viscous fluid"}
	Newman1977 = &Source{ID: "newman-1977", Short: "Newman 1977", Memory: true,
		Full: "Newman, J. N., Marine Hydrodynamics, MIT Press, 1977"}
	GovardhanWilliamson2000 = &Source{ID: "govardhan-williamson-2000", Short: "Govardhan & Williamson 2000", Memory: true,
		Full: "Govardhan, R. & Williamson, C. H. K., Modes of vortex formation and frequency response of a freely vibrating cylinder, Journal of Fluid Mechanics 420, 85-130, 2000", Locator: "end of the lower branch, critical mass ratio 0.54"}
	Faltinsen1990 = &Source{ID: "faltinsen-1990", Short: "Faltinsen 1990", Memory: true,
		Full: "Faltinsen, O. M., Sea Loads on Ships and Offshore Structures, Cambridge University Press, 1990", Locator: "ch. 2 and 3, linear and second-order wave loads; ch. 9, slamming"}
	Miche1944 = &Source{ID: "miche-1944", Short: "Miche 1944", Memory: true,
		Full: "Miche, R., Mouvements ondulatoires de la mer en profondeur constante ou décroissante, Annales des Ponts et Chaussées 114, 1944", Locator: "limiting steepness 0.142 tanh kd"}
	WienkeOumeraci2005 = &Source{ID: "wienke-oumeraci-2005", Short: "Wienke & Oumeraci 2005", Memory: true,
		Full: "Wienke, J. & Oumeraci, H., Breaking wave impact force on a vertical and inclined slender pile, Coastal Engineering 52, 435-462, 2005", Locator: "duration of impact 13R/(32V)"}
	Keulegan1959 = &Source{ID: "keulegan-1959", Short: "Keulegan 1959", Memory: true,
		Full: "Keulegan, G. H., Energy dissipation in standing waves in rectangular basins, Journal of Fluid Mechanics 6, 33-50, 1959", Locator: "loss in the layers on walls and bottom"}
	Malhotra2000 = &Source{ID: "malhotra-2000", Short: "Malhotra, Wenk & Wieland 2000", Memory: true,
		Full: "Malhotra, P. K., Wenk, T. & Wieland, M., Simple procedure for seismic analysis of liquid-storage tanks, Structural Engineering International 10, 197-201, 2000", Locator: "impulsive coefficient C_i; also EN 1998-4, table A.2"}
	Housner1957 = &Source{ID: "housner-1957", Short: "Housner 1957", Memory: true,
		Full: "Housner, G. W., Dynamic pressures on accelerated fluid containers, Bulletin of the Seismological Society of America 47, 15-35, 1957"}
	Morison1950 = &Source{ID: "morison-1950", Short: "Morison et al. 1950", Memory: true,
		Full: "Morison, J. R., O'Brien, M. P., Johnson, J. W. & Schaaf, S. A., The force exerted by surface waves on piles, Petroleum Transactions 189, 149-154, 1950"}
	WeaverFitzpatrickElKashlan1987 = &Source{ID: "weaver-fitzpatrick-elkashlan-1987", Short: "Weaver, Fitzpatrick & ElKashlan 1987", Memory: true,
		Full: "Weaver, D. S., Fitzpatrick, J. A. & ElKashlan, M., Strouhal numbers for heat exchanger tube arrays in cross flow, Journal of Pressure Vessel Technology 109, 219-223, 1987", Locator: "Strouhal number by layout and pitch ratio, on the pitch velocity"}
	PettigrewTaylor2003 = &Source{ID: "pettigrew-taylor-2003", Short: "Pettigrew & Taylor 2003", Memory: true,
		Full: "Pettigrew, M. J. & Taylor, C. E., Vibration analysis of shell-and-tube heat exchangers: an overview, parts 1 and 2, Journal of Fluids and Structures 18, 469-500, 2003", Locator: "damping in gas, liquid and two-phase flow; periodic wake shedding"}
	Zukauskas1972 = &Source{ID: "zukauskas-1972", Short: "Žukauskas 1972", Memory: true,
		Full: "Žukauskas, A., Heat transfer from tubes in crossflow, Advances in Heat Transfer 8, 93-160, 1972", Locator: "pressure drop and turbulence of banks of tubes"}
	Parker1978 = &Source{ID: "parker-1978", Short: "Parker 1978", Memory: true,
		Full: "Parker, R., Acoustic resonances in passages containing banks of heat exchanger tubes, Journal of Sound and Vibration 57, 245-260, 1978", Locator: "effective speed of sound c/√(1 + σ)"}
	Zdravkovich1987 = &Source{ID: "zdravkovich-1987", Short: "Zdravkovich 1987", Memory: true,
		Full: "Zdravkovich, M. M., The effects of interference between circular cylinders in cross flow, Journal of Fluids and Structures 1, 239-261, 1987", Locator: "tandem to 3.8 D, side by side to 2.2 D"}
	BokaianGeoola1984 = &Source{ID: "bokaian-geoola-1984", Short: "Bokaian & Geoola 1984", Memory: true,
		Full: "Bokaian, A. & Geoola, F., Wake-induced galloping of two interfering circular cylinders, Journal of Fluid Mechanics 146, 383-415, 1984"}
	ASMESTS1 = &Source{ID: "asme-sts-1", Short: "ASME STS-1", Memory: true,
		Full: "ASME STS-1 Steel Stacks, American Society of Mechanical Engineers", Locator: "ovalling: critical speed f D/(2 St) of the ring"}
	PaidoussisPriceSuen1982 = &Source{ID: "paidoussis-price-suen-1982", Short: "Païdoussis, Price & Suen 1982", Memory: true,
		Full: "Païdoussis, M. P., Price, S. J. & Suen, H.-C., Ovalling oscillations of cantilevered and clamped-clamped cylindrical shells in cross flow: an experimental study, Journal of Sound and Vibration 83, 533-553, 1982", Locator: "ovalling without periodic shedding"}
	TurekHron2006 = &Source{ID: "turek-hron-2006", Short: "Turek & Hron 2006", Memory: true,
		Full: "Turek, S. & Hron, J., Proposal for numerical benchmarking of fluid-structure interaction between an elastic object and laminar incompressible flow, Lecture Notes in Computational Science and Engineering 53, 371-385, 2006", Locator: "FSI1, FSI2, FSI3"}
	ApeltWest1975 = &Source{ID: "apelt-west-1975", Short: "Apelt & West 1975", Memory: true,
		Full: "Apelt, C. J. & West, G. S., The effects of wake splitter plates on bluff-body flow in the range 10⁴ < R < 5 × 10⁴, part 2, Journal of Fluid Mechanics 71, 145-160, 1975", Locator: "shedding behind plates of up to seven diameters"}
	Sader2016 = &Source{ID: "sader-2016", Short: "Sader, Cossé, Kim, Fan & Gharib 2016", Memory: true,
		Full: "Sader, J. E., Cossé, J., Kim, D., Fan, B. & Gharib, M., Large-amplitude flapping of an inverted flag in a uniform steady flow: a vortex-induced vibration, Journal of Fluid Mechanics 793, 524-555, 2016", Locator: "divergence of a plate clamped at its trailing edge"}
	ScanlanTomko1971 = &Source{ID: "scanlan-tomko-1971", Short: "Scanlan & Tomko 1971", Memory: true,
		Full: "Scanlan, R. H. & Tomko, J. J., Airfoil and bridge deck flutter derivatives, Journal of the Engineering Mechanics Division ASCE 97, 1717-1737, 1971"}
	LowryPolhamus1957 = &Source{ID: "lowry-polhamus-1957", Short: "Lowry & Polhamus 1957", Memory: true,
		Full: "Lowry, J. G. & Polhamus, E. C., A method for predicting lift increments due to flap deflection at low angles of attack in incompressible flow, NACA TN 3911, 1957", Locator: "lift slope of swept wings of low aspect ratio, after Helmbold 1942 and Diederich 1951"}
	DiederichBudiansky1948 = &Source{ID: "diederich-budiansky-1948", Short: "Diederich & Budiansky 1948", Memory: true,
		Full: "Diederich, F. W. & Budiansky, B., Divergence of swept wings, NACA TN 1680, 1948", Locator: "uniform swept cantilever"}
	Davenport1967 = &Source{ID: "davenport-1967", Short: "Davenport 1967", Memory: true,
		Full: "Davenport, A. G., Gust loading factors, Journal of the Structural Division ASCE 93, 11-34, 1967"}
	Taylor1941 = &Source{ID: "taylor-1941", Short: "Taylor 1941", Memory: true,
		Full: "Taylor, G. I., The pressure and impulse of submarine explosion waves on plates, 1941, in Scientific Papers vol. 3, Cambridge University Press, 1963"}
	Cole1948 = &Source{ID: "cole-1948", Short: "Cole 1948", Memory: true,
		Full: "Cole, R. H., Underwater Explosions, Princeton University Press, 1948", Locator: "ch. 7, shock wave; ch. 10, damage to plates"}
	ZhaoSuo2007 = &Source{ID: "zhao-suo-2007", Short: "Zhao & Suo 2007", Memory: true,
		Full: "Zhao, X. & Suo, Z., Method to analyze electromechanical stability of dielectric elastomers, Applied Physics Letters 91, 061921, 2007", Locator: "equal-biaxial membrane of an ideal dielectric elastomer, neo-Hookean"}
	ThisMethod = &Source{ID: "this-method", Short: "definition of this method",
		Full: "A definition or a judgement of this tool, with its reason beside it; no outside source"}
)

var assumptions = []*Source{ZhaoSuo2007, GovardhanWilliamson2000, Blevins1990, GadElHak1999, SumerFredsoe2006, Schlichting1979, Batchelor1967, Paidoussis2016,
	PaidoussisPriceDeLangre2011, BisplinghoffAshleyHalfman1955, Dowell1975, Reynolds1886, Timoshenko1974, Brennen1995,
	KinslerFrey2000, Landau1987, Newman1977, ScanlanTomko1971, LowryPolhamus1957, DiederichBudiansky1948, Davenport1967, WeaverFitzpatrickElKashlan1987,
	PettigrewTaylor2003, Zukauskas1972, Parker1978, Zdravkovich1987, BokaianGeoola1984, ASMESTS1, PaidoussisPriceSuen1982, TurekHron2006,
	ApeltWest1975, Sader2016, ThisMethod,
	Faltinsen1990, Miche1944, WienkeOumeraci2005, Keulegan1959, Malhotra2000, Housner1957, Morison1950, Taylor1941, Cole1948}
