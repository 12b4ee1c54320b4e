package cite

// Sources on codes and standards.
var (
	EN1991Strouhal = &Source{
		ID: "en-1991-1-4-e1", Short: "EN 1991-1-4 Table E.1",
		Full:    "EN 1991-1-4:2005 Eurocode 1: Actions on structures, Part 1-4: General actions, Wind actions, CEN, 2005",
		Locator: "Annex E, Table E.1 and Figure E.1", Memory: true,
	}
	EN1991LockIn = &Source{
		ID: "en-1991-1-4-e12", Short: "EN 1991-1-4 E.1.2",
		Full:    "EN 1991-1-4:2005 Eurocode 1: Actions on structures, Part 1-4: General actions, Wind actions, CEN, 2005",
		Locator: "Annex E, E.1.2(2), criterion for vortex shedding", Memory: true,
	}
	EN1991Amplitude = &Source{
		ID: "en-1991-1-4-e15", Short: "EN 1991-1-4 E.1.5",
		Full:    "EN 1991-1-4:2005 Eurocode 1: Actions on structures, Part 1-4: General actions, Wind actions, CEN, 2005",
		Locator: "Annex E, E.1.5, cross wind amplitude, c_lat and K_a", Memory: true,
	}
	EN1991Galloping = &Source{
		ID: "en-1991-1-4-e2", Short: "EN 1991-1-4 E.2 and Table E.7",
		Full:    "EN 1991-1-4:2005 Eurocode 1: Actions on structures, Part 1-4: General actions, Wind actions, CEN, 2005",
		Locator: "Annex E, E.2.2 and Table E.7, factor of galloping instability", Memory: true,
	}
	EN1991Divergence = &Source{
		ID: "en-1991-1-4-e4", Short: "EN 1991-1-4 E.4",
		Full:    "EN 1991-1-4:2005 Eurocode 1: Actions on structures, Part 1-4: General actions, Wind actions, CEN, 2005",
		Locator: "Annex E, E.4.2 and E.4.3, divergence; Figure E.6, moment slope of rectangles", Memory: true,
	}
	EN1991Gust = &Source{
		ID: "en-1991-1-4-b", Short: "EN 1991-1-4 Annex B",
		Full:    "EN 1991-1-4:2005 Eurocode 1: Actions on structures, Part 1-4: General actions, Wind actions, CEN, 2005",
		Locator: "Annex B, procedure 1 for the structural factor; section 6.3.1", Memory: true,
	}
	ASMEN1324 = &Source{
		ID: "asme-iii-n-1324", Short: "ASME III App. N-1324",
		Full:    "ASME Boiler and Pressure Vessel Code, Section III, Division 1, Nonmandatory Appendix N",
		Locator: "N-1324.1, avoiding lock-in", Memory: true,
	}
	ASMEN1331 = &Source{
		ID: "asme-iii-n-1331", Short: "ASME III App. N-1331",
		Full:    "ASME Boiler and Pressure Vessel Code, Section III, Division 1, Nonmandatory Appendix N",
		Locator: "N-1331, fluid-elastic instability of tube arrays", Memory: true,
	}
	DNVC205 = &Source{
		ID: "dnv-rp-c205", Short: "DNV-RP-C205",
		Full:    "DNV-RP-C205 Environmental conditions and environmental loads, DNV",
		Locator: "section 9, vortex induced oscillations", Memory: true,
	}
	PTC193TW = &Source{
		ID: "asme-ptc-19-3-tw", Short: "ASME PTC 19.3 TW-2016",
		Full:    "ASME PTC 19.3 TW-2016 Thermowells, ASME, 2016",
		Locator: "sections 6-8, frequency limits and Scruton number", Memory: true,
	}
	API650E = &Source{
		ID: "api-650-e", Short: "API 650 App. E",
		Full:    "API Standard 650 Welded Tanks for Oil Storage, American Petroleum Institute",
		Locator: "Appendix E, convective mass 0.230 (D/H) tanh(3.67 H/D)", Memory: true,
	}
	API650Freeboard = &Source{
		ID: "api-650-e-freeboard", Short: "API 650 App. E.7.2",
		Full:    "API Standard 650 Welded Tanks for Oil Storage, American Petroleum Institute",
		Locator: "Appendix E, sloshing wave height 0.42 D A_f above the product", Memory: true,
	}
	DNVC205Waves = &Source{
		ID: "dnv-rp-c205-waves", Short: "DNV-RP-C205, sections 6 to 8",
		Full:    "DNV-RP-C205 Environmental conditions and environmental loads, DNV",
		Locator: "sections 6 and 7, slender (λ > 5D) and large bodies; section 8, air gap and slamming; appendix D, added mass", Memory: true,
	}
	ASMEB314 = &Source{
		ID: "asme-b31-4", Short: "ASME B31.4",
		Full:    "ASME B31.4 Pipeline Transportation Systems for Liquids and Slurries, ASME",
		Locator: "surge allowance of ten per cent", Memory: true,
	}
)

var standards = []*Source{
	EN1991Strouhal, EN1991LockIn, EN1991Amplitude, EN1991Galloping,
	ASMEN1324, ASMEN1331, DNVC205, PTC193TW, API650E, ASMEB314, API650Freeboard, DNVC205Waves, EN1991Divergence, EN1991Gust,
}
