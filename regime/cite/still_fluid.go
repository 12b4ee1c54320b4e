package cite

// Sources on oscillation and sound in still fluid, films, tubes.
var (
	Stokes1851 = &Source{
		ID: "stokes-1851", Short: "Stokes 1851",
		Full:    "G. G. Stokes, On the effect of the internal friction of fluids on the motion of pendulums, Trans. Cambridge Philos. Soc. 9 (1851) 8–106",
		Locator: "part I, sections II (sphere) and III (cylinder)", Memory: true,
	}
	Rosenhead1963 = &Source{
		ID: "rosenhead-1963", Short: "Rosenhead 1963",
		Full:    "L. Rosenhead (ed.), Laminar Boundary Layers, Oxford University Press, 1963",
		Locator: "chapter VII, oscillation about a state of rest", Memory: true,
	}
	Sader1998 = &Source{
		ID: "sader-1998", Short: "Sader 1998",
		Full:    "J. E. Sader, Frequency response of cantilever beams immersed in viscous fluids with applications to the atomic force microscope, J. Appl. Phys. 84 (1998) 64–76",
		Locator: "eqs 20 to 22", Memory: true,
	}
	Tuck1969 = &Source{
		ID: "tuck-1969", Short: "Tuck 1969",
		Full:    "E. O. Tuck, Calculation of unsteady flows due to small motions of cylinders in a viscous fluid, J. Eng. Math. 3 (1969) 29–44",
		Locator: "force on an oscillating ribbon, numerical values",
		Memory:  true,
	}
	Chen1976 = &Source{
		ID: "chen-1976", Short: "Chen, Wambsganss & Jendrzejczyk 1976",
		Full:    "S. S. Chen, M. W. Wambsganss, J. A. Jendrzejczyk, Added mass and damping of a vibrating rod in confined viscous fluids, J. Appl. Mech. 43 (1976) 325–329",
		Locator: "closed form of the force on the rod in the annulus", Memory: true,
	}
	Fritz1972 = &Source{
		ID: "fritz-1972", Short: "Fritz 1972",
		Full:    "R. J. Fritz, The effect of liquids on the dynamic motions of immersed solids, J. Eng. Ind. 94 (1972) 167–173",
		Locator: "concentric cylinders, inertia of the annulus", Memory: true,
	}
	LambImages1932 = &Source{
		ID: "lamb-1932-images", Short: "Lamb 1932, images",
		Full:    "H. Lamb, Hydrodynamics, 6th ed., Cambridge University Press, 1932",
		Locator: "chapter IV for the image of a dipole in a circle, chapter VI for the motion of solids near a wall", Memory: true,
	}
	JungerFeit1986 = &Source{
		ID: "junger-feit-1986", Short: "Junger & Feit 1986",
		Full:    "M. C. Junger, D. Feit, Sound, Structures, and Their Interaction, 2nd ed., MIT Press, 1986",
		Locator: "chapter 2 (sphere), chapter 6 (cylinder), chapter 8 (plates)", Memory: true,
	}
	Rayleigh1896 = &Source{
		ID: "rayleigh-1896", Short: "Rayleigh 1896",
		Full:    "J. W. Strutt, Baron Rayleigh, The Theory of Sound, vol. II, 2nd ed., Macmillan, 1896",
		Locator: "§ 302, circular piston in a plane", Memory: true,
	}
	KinslerPiston2000 = &Source{
		ID: "kinsler-2000-piston", Short: "Kinsler et al. 2000, section 7.5",
		Full:    "L. E. Kinsler, A. R. Frey, A. B. Coppens, J. V. Sanders, Fundamentals of Acoustics, 4th ed., Wiley, 2000",
		Locator: "section 7.5, radiation impedance of a piston", Memory: true,
	}
	CremerHeckl2005 = &Source{
		ID: "cremer-heckl-2005", Short: "Cremer & Heckl",
		Full:    "L. Cremer, M. Heckl, B. A. T. Petersson, Structure-Borne Sound, 3rd ed., Springer, 2005",
		Locator: "chapter 6, sound radiation from structures", Memory: true,
	}
	Langlois1962 = &Source{
		ID: "langlois-1962", Short: "Langlois 1962",
		Full:    "W. E. Langlois, Isothermal squeeze films, Q. Appl. Math. 20 (1962) 131–150",
		Locator: "linearised isothermal film between parallel plates", Memory: true,
	}
	Blech1983 = &Source{
		ID: "blech-1983", Short: "Blech 1983",
		Full:    "J. J. Blech, On isothermal squeeze films, J. Lubr. Technol. 105 (1983) 615–620",
		Locator: "rectangular plate with open edges, series for spring and damping", Memory: true,
	}
	Veijola1995 = &Source{
		ID: "veijola-1995", Short: "Veijola et al. 1995",
		Full:    "T. Veijola, H. Kuisma, J. Lahdenperä, T. Ryhänen, Equivalent-circuit model of the squeezed gas film in a silicon accelerometer, Sensors and Actuators A 48 (1995) 239–248",
		Locator: "effective viscosity, fit in the Knudsen number", Memory: true,
	}
	Womersley1955 = &Source{
		ID: "womersley-1955", Short: "Womersley 1955",
		Full:    "J. R. Womersley, Method for the calculation of velocity, rate of flow and viscous drag in arteries when the pressure gradient is known, J. Physiol. 127 (1955) 553–563",
		Locator: "flow under an oscillating pressure gradient, 1 − F10 and its table", Memory: true,
	}
	AbramowitzStegun1964 = &Source{
		ID: "abramowitz-stegun-1964", Short: "Abramowitz & Stegun 1964",
		Full:    "M. Abramowitz, I. A. Stegun (eds), Handbook of Mathematical Functions, National Bureau of Standards, 1964",
		Locator: "chapters 9 (Bessel functions) and 12 (Struve functions)", Memory: true,
	}
	Temme1975 = &Source{
		ID: "temme-1975", Short: "Temme 1975",
		Full:    "N. M. Temme, On the numerical evaluation of the modified Bessel function of the third kind, J. Comput. Phys. 19 (1975) 324–337",
		Locator: "continued fraction for K_ν", Memory: true,
	}
)

var stillFluid = []*Source{
	Stokes1851, Rosenhead1963, Sader1998, Tuck1969, Chen1976, Fritz1972,
	LambImages1932, JungerFeit1986, Rayleigh1896,
	KinslerPiston2000, CremerHeckl2005, Langlois1962, Blech1983, Veijola1995,
	Womersley1955, AbramowitzStegun1964, Temme1975,
}
