package cite

// Sources on properties of fluids and solids, units.
var (
	IAPWSIF97 = &Source{
		ID: "iapws-if97", Short: "IAPWS-IF97",
		Full:    "International Association for the Properties of Water and Steam: Revised Release on the IAPWS Industrial Formulation 1997 for the Thermodynamic Properties of Water and Steam, R7-97(2012)",
		Locator: "region 1: Eq. 7 and Table 2, check values Table 5; region 4: Eq. 30 and Table 34, check values Table 35",
		Memory:  true,
	}
	IAPWSR1208 = &Source{
		ID: "iapws-r12-08", Short: "IAPWS R12-08",
		Full:    "International Association for the Properties of Water and Steam: Release on the IAPWS Formulation 2008 for the Viscosity of Ordinary Water Substance, R12-08",
		Locator: "Eqs. 10 to 12, Tables 1 and 2, check values Table 4",
		Memory:  true,
	}
	IAPWSR176 = &Source{
		ID: "iapws-r1-76", Short: "IAPWS R1-76",
		Full:    "International Association for the Properties of Water and Steam: Revised Release on Surface Tension of Ordinary Water Substance, R1-76(2014)",
		Locator: "Eq. 1 and Table 1",
		Memory:  true,
	}
	IAPWSR1511 = &Source{
		ID: "iapws-r15-11", Short: "IAPWS R15-11",
		Full:    "International Association for the Properties of Water and Steam: Release on the IAPWS Formulation 2011 for the Thermal Conductivity of Ordinary Water Substance, R15-11",
		Locator: "dilute-gas part Eq. 16 and Table 1, check values Table 4",
		Memory:  true,
	}
	UNESCO44 = &Source{
		ID: "unesco-44", Short: "UNESCO 44 (1983)",
		Full:    "Fofonoff, N. P., Millard, R. C.: Algorithms for Computation of Fundamental Properties of Seawater, UNESCO Technical Papers in Marine Science 44, 1983",
		Locator: "density (EOS-80) pp. 15 to 24, sound speed (Chen and Millero 1977) pp. 46 to 50",
		Memory:  true,
	}
	Sharqawy2010 = &Source{
		ID: "sharqawy-2010", Short: "Sharqawy et al. 2010",
		Full:    "Sharqawy, M. H., Lienhard, J. H., Zubair, S. M.: Thermophysical properties of seawater: a review of existing correlations and data, Desalination and Water Treatment 16, 2010, pp. 354 to 380",
		Locator: "viscosity Eqs. 22 and 23, surface tension Eq. 28, vapour pressure Eq. 32",
		Memory:  true,
	}
	Nayar2014 = &Source{
		ID: "nayar-2014", Short: "Nayar et al. 2014",
		Full:    "Nayar, K. G., Panchanathan, D., McKinley, G. H., Lienhard, J. H.: Surface tension of seawater, Journal of Physical and Chemical Reference Data 43, 2014, 043103",
		Locator: "correlation for 1 to 92 °C and 0 to 131 g/kg",
		Memory:  true,
	}
	ITTCWater2011 = &Source{
		ID: "ittc-water-2011", Short: "ITTC 7.5-02-01-03 (2011)",
		Full:    "International Towing Tank Conference: Recommended Procedures 7.5-02-01-03, Fresh Water and Seawater Properties, revision 2, 2011",
		Locator: "seawater table, 15 °C",
		Memory:  true,
	}
	ISO3666 = &Source{
		ID: "iso-tr-3666", Short: "ISO/TR 3666:1998",
		Full:    "International Organization for Standardization: ISO/TR 3666, Viscosity of water, 2nd edition, 1998",
		Locator: "value at 20 °C and atmospheric pressure",
		Memory:  true,
	}
	USSA1976 = &Source{
		ID: "ussa-1976", Short: "US Standard Atmosphere 1976",
		Full:    "NOAA, NASA, USAF: U.S. Standard Atmosphere, 1976, NOAA-S/T 76-1562, Washington, D.C.",
		Locator: "sound speed Eq. 50, viscosity Eq. 51, thermal conductivity Eq. 53, tables I and III",
		Memory:  true,
	}
	CODATA2018 = &Source{
		ID: "codata-2018", Short: "CODATA 2018",
		Full:    "Tiesinga, E., Mohr, P. J., Newell, D. B., Taylor, B. N.: CODATA recommended values of the fundamental physical constants: 2018, Reviews of Modern Physics 93, 2021, 025010",
		Locator: "molar gas constant; second radiation constant",
		Memory:  true,
	}
	WhiteViscous = &Source{
		ID: "white-viscous", Short: "White, Viscous Fluid Flow",
		Full:    "White, F. M.: Viscous Fluid Flow, 3rd edition, McGraw-Hill, 2006",
		Locator: "Sutherland constants of gases, Table 1-2",
		Memory:  true,
	}
	KayeLaby = &Source{
		ID: "kaye-laby", Short: "Kaye and Laby",
		Full:    "Kaye, G. W. C., Laby, T. H.: Tables of Physical and Chemical Constants, 16th edition, Longman, 1995",
		Locator: "viscosity of gases; speed of sound in liquids and gases",
		Memory:  true,
	}
	Shimanouchi1972 = &Source{
		ID: "shimanouchi-1972", Short: "Shimanouchi 1972",
		Full:    "Shimanouchi, T.: Tables of Molecular Vibrational Frequencies, Consolidated Volume I, NSRDS-NBS 39, 1972",
		Locator: "fundamentals of H2O, CO2 and CH4; the diatomic ones from Herzberg, Spectra of Diatomic Molecules, 2nd edition, 1950",
		Memory:  true,
	}
	ChapmanCowling = &Source{
		ID: "chapman-cowling", Short: "Chapman and Cowling",
		Full:    "Chapman, S., Cowling, T. G.: The Mathematical Theory of Non-Uniform Gases, 3rd edition, Cambridge University Press, 1970",
		Locator: "Eucken's relation, chapter 13",
		Memory:  true,
	}
	SmithVanNess = &Source{
		ID: "smith-van-ness", Short: "Smith, Van Ness and Abbott",
		Full:    "Smith, J. M., Van Ness, H. C., Abbott, M. M.: Introduction to Chemical Engineering Thermodynamics, 7th edition, McGraw-Hill, 2005",
		Locator: "generalized second virial coefficient, Eqs. 3.63 to 3.66; critical constants, Table B.1; classical constants of quantum gases after Gunn, Chueh and Prausnitz 1966",
		Memory:  true,
	}
	Dymond2002 = &Source{
		ID: "dymond-2002", Short: "Dymond et al. 2002",
		Full:    "Dymond, J. H., Marsh, K. N., Wilhoit, R. C., Wong, K. C.: Virial Coefficients of Pure Gases, Landolt-Börnstein IV/21A, Springer, 2002",
		Locator: "second virial coefficients near 300 K, rounded",
		Memory:  true,
	}
	Incropera = &Source{
		ID: "incropera", Short: "Incropera et al.",
		Full:    "Incropera, F. P., DeWitt, D. P., Bergman, T. L., Lavine, A. S.: Fundamentals of Heat and Mass Transfer, 6th edition, Wiley, 2007",
		Locator: "gases at atmospheric pressure, Table A.4",
		Memory:  true,
	}
	CRCHandbook = &Source{
		ID: "crc-handbook", Short: "CRC Handbook",
		Full:    "Haynes, W. M. (ed.): CRC Handbook of Chemistry and Physics, 95th edition, CRC Press, 2014",
		Locator: "section 6, fluid properties; section 5, concentrative properties of aqueous solutions",
		Memory:  true,
	}
	ISO3448 = &Source{
		ID: "iso-3448", Short: "ISO 3448",
		Full:    "International Organization for Standardization: ISO 3448, Industrial liquid lubricants: ISO viscosity classification, 2nd edition, 1992",
		Locator: "mid-point kinematic viscosity at 40 °C, Table 1; limits ±10 %",
		Memory:  true,
	}
	ASTMD341 = &Source{
		ID: "astm-d341", Short: "ASTM D341",
		Full:    "ASTM International: D341, Standard Practice for Viscosity-Temperature Equations and Charts for Liquid Petroleum or Hydrocarbon Products",
		Locator: "Walther's equation with the constant 0.7, for more than 2 mm²/s",
		Memory:  true,
	}
	FinkLeibowitz1995 = &Source{
		ID: "fink-leibowitz-1995", Short: "Fink and Leibowitz 1995",
		Full:    "Fink, J. K., Leibowitz, L.: Thermodynamic and Transport Properties of Sodium Liquid and Vapor, ANL/RE-95/2, Argonne National Laboratory, 1995",
		Locator: "recommended equations for vapour pressure, density, speed of sound, surface tension and viscosity",
		Memory:  true,
	}
	NEALeadBismuth2015 = &Source{
		ID: "nea-lead-bismuth-2015", Short: "NEA lead-bismuth handbook 2015",
		Full:    "OECD Nuclear Energy Agency: Handbook on Lead-bismuth Eutectic Alloy and Lead Properties, Materials Compatibility, Thermal-hydraulics and Technologies, 2015 edition, NEA No. 7268",
		Locator: "recommended correlations, chapter 2",
		Memory:  true,
	}
	Sobolev2007 = &Source{
		ID: "sobolev-2007", Short: "Sobolev 2007",
		Full:    "Sobolev, V.: Thermophysical properties of lead and lead-bismuth eutectic, Journal of Nuclear Materials 362, 2007, pp. 235 to 247",
		Locator: "correlations of density, viscosity and speed of sound",
		Memory:  true,
	}
	TypicalLiquids = &Source{
		ID: "typical-liquids", Short: "typical values of liquids",
		Full:    "Typical handbook values of liquids as common in engineering practice, rounded",
		Locator: "",
		Memory:  true,
	}
	TypicalSolids = &Source{
		ID: "typical-solids", Short: "typical values of solids",
		Full:    "Typical handbook values of engineering materials at room temperature as common in engineering practice, rounded",
		Locator: "",
		Memory:  true,
	}
	KinslerAcoustics = &Source{
		ID: "kinsler-acoustics", Short: "Kinsler et al.",
		Full:    "Kinsler, L. E., Frey, A. R., Coppens, A. B., Sanders, J. V.: Fundamentals of Acoustics, 4th edition, Wiley, 2000",
		Locator: "bar speeds of solids, appendix A10",
		Memory:  true,
	}
	AshbyMaterials = &Source{
		ID: "ashby-materials", Short: "Ashby, Materials Selection",
		Full:    "Ashby, M. F.: Materials Selection in Mechanical Design, 4th edition, Butterworth-Heinemann, 2011",
		Locator: "property ranges, appendix A",
		Memory:  true,
	}
	FungCirculation = &Source{
		ID: "fung-circulation", Short: "Fung, Circulation",
		Full:    "Fung, Y. C.: Biomechanics: Circulation, 2nd edition, Springer, 1997",
		Locator: "blood and the arterial wall, chapters 2 and 3",
		Memory:  true,
	}
)

var fluids = []*Source{
	IAPWSIF97, IAPWSR1208, IAPWSR176, IAPWSR1511, UNESCO44, Sharqawy2010, Nayar2014, ITTCWater2011, ISO3666,
	USSA1976, CODATA2018, WhiteViscous, KayeLaby, Shimanouchi1972, ChapmanCowling, SmithVanNess, Dymond2002,
	Incropera, CRCHandbook, ISO3448, ASTMD341, FinkLeibowitz1995, NEALeadBismuth2015, Sobolev2007,
	TypicalLiquids, TypicalSolids, KinslerAcoustics, AshbyMaterials, FungCirculation,
}
