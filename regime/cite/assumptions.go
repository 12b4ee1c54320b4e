package cite

// Sources on the thresholds and judgements of the assumptions.
var (
	Blevins1990 = &Source{ID: "blevins-1990", Short: "Blevins 1990", Memory: true,
		Full: "Blevins, R. D., Flow-Induced Vibration, 2nd ed., Van Nostrand Reinhold, 1990"}
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
		Full: "Bisplinghoff, R. L., Ashley, H. & Halfman, R. L., Aeroelasticity, Addison-Wesley, 1955"}
	Dowell1975 = &Source{ID: "dowell-1975", Short: "Dowell 1975", Memory: true,
		Full: "Dowell, E. H., Aeroelasticity of Plates and Shells, Noordhoff, 1975"}
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
	ThisMethod = &Source{ID: "this-method", Short: "definition of this method",
		Full: "A definition or a judgement of this tool, with its reason beside it; no outside source"}
)

var assumptions = []*Source{GovardhanWilliamson2000, Blevins1990, GadElHak1999, SumerFredsoe2006, Schlichting1979, Batchelor1967, Paidoussis2016,
	PaidoussisPriceDeLangre2011, BisplinghoffAshleyHalfman1955, Dowell1975, Reynolds1886, Timoshenko1974, Brennen1995,
	KinslerFrey2000, Landau1987, Newman1977, ThisMethod}
