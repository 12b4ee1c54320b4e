package cite

// Sources on beams, plates and other structures.
var (
	Blevins1979 = &Source{
		ID: "blevins-1979", Short: "Blevins 1979",
		Full:    "R. D. Blevins, Formulas for Natural Frequency and Mode Shape, Van Nostrand Reinhold, 1979",
		Locator: "tables 7-1 (cables), 8-1 (beams), 9-2 (rings), 11-1 (circular plates), 11-4 (rectangular plates)", Memory: true,
	}
	WittrickWilliams1971 = &Source{
		ID: "wittrick-williams-1971", Short: "Wittrick & Williams 1971",
		Full:    "W. H. Wittrick, F. W. Williams, A general algorithm for computing natural frequencies of elastic structures, Q. J. Mech. Appl. Math. 24 (1971) 263-284",
		Locator: "count of natural frequencies below a trial value", Memory: true,
	}
	Bokaian1990 = &Source{
		ID: "bokaian-1990", Short: "Bokaian 1990",
		Full:    "A. Bokaian, Natural frequencies of beams under tensile axial loads, J. Sound Vib. 142 (1990) 481-498",
		Locator: "frequency equations of the single-span beam", Memory: true,
	}
	Leissa1969 = &Source{
		ID: "leissa-1969", Short: "Leissa 1969",
		Full:    "A. W. Leissa, Vibration of Plates, NASA SP-160, 1969",
		Locator: "chapter 2 (circular plates), chapter 4 (rectangular plates)", Memory: true,
	}
	Leissa1973 = &Source{
		ID: "leissa-1973", Short: "Leissa 1973",
		Full:    "A. W. Leissa, The free vibration of rectangular plates, J. Sound Vib. 31 (1973) 257-293",
		Locator: "tables of the 21 combinations of edges, nu = 0.3", Memory: true,
	}
	Bhat1985 = &Source{
		ID: "bhat-1985", Short: "Bhat 1985",
		Full:    "R. B. Bhat, Natural frequencies of rectangular plates using characteristic orthogonal polynomials in Rayleigh-Ritz method, J. Sound Vib. 102 (1985) 493-499",
		Locator: "orthogonal polynomials that satisfy the geometric edge conditions", Memory: true,
	}
	WoinowskyKrieger1950 = &Source{
		ID: "woinowsky-krieger-1950", Short: "Woinowsky-Krieger 1950",
		Full:    "S. Woinowsky-Krieger, The effect of an axial force on the vibration of hinged bars, J. Appl. Mech. 17 (1950) 35-36",
		Locator: "elliptic-function solution of the one-mode equation", Memory: true,
	}
	ChuHerrmann1956 = &Source{
		ID: "chu-herrmann-1956", Short: "Chu & Herrmann 1956",
		Full:    "H.-N. Chu, G. Herrmann, Influence of large amplitudes on free flexural vibrations of rectangular elastic plates, J. Appl. Mech. 23 (1956) 532-540",
		Locator: "immovable simply supported plate, nu = 0.3", Memory: true,
	}
	Lamb1920 = &Source{
		ID: "lamb-1920", Short: "Lamb 1920",
		Full:    "H. Lamb, On the vibrations of an elastic plate in contact with water, Proc. R. Soc. Lond. A 98 (1920) 205-216",
		Locator: "inertia coefficient 0.6689 of the clamped plate with the trial shape (1 - r^2/a^2)^2", Memory: true,
	}
	McLachlan1932 = &Source{
		ID: "mclachlan-1932", Short: "McLachlan 1932",
		Full:    "N. W. McLachlan, The accession to inertia of flexible discs vibrating in a fluid, Proc. Phys. Soc. 44 (1932) 546-555",
		Locator: "discs with nodal circles and nodal diameters", Memory: true,
	}
	Wallace1972 = &Source{
		ID: "wallace-1972", Short: "Wallace 1972",
		Full:    "C. E. Wallace, Radiation resistance of a rectangular panel, J. Acoust. Soc. Am. 51 (1972) 946-952",
		Locator: "integral over the hemisphere; low-frequency forms by the parity of the mode", Memory: true,
	}
	IrvineCaughey1974 = &Source{
		ID: "irvine-caughey-1974", Short: "Irvine & Caughey 1974",
		Full:    "H. M. Irvine, T. K. Caughey, The linear theory of free vibrations of a suspended cable, Proc. R. Soc. Lond. A 341 (1974) 299-315",
		Locator: "symmetric in-plane modes", Memory: true,
	}
	Love1927 = &Source{
		ID: "love-1927", Short: "Love 1927",
		Full:    "A. E. H. Love, A Treatise on the Mathematical Theory of Elasticity, 4th ed., Cambridge University Press, 1927",
		Locator: "section 293, vibrations of a circular ring", Memory: true,
	}
)

var structures = []*Source{
	Blevins1979, WittrickWilliams1971, Bokaian1990, Leissa1969, Leissa1973, Bhat1985,
	WoinowskyKrieger1950, ChuHerrmann1956, Lamb1920, McLachlan1932, Wallace1972,
	IrvineCaughey1974, Love1927,
}
