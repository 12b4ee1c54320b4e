package fluid

import "regimed/regime/cite"

// water is liquid; its vapour is steam.
var water = &Model{
	Name: "water", Title: "water (liquid)", Phase: Liquid,
	UsesTemperature: true, UsesPressure: true,
	Default: State{Temperature: 293.15, Pressure: 101325},
	Range: Range{
		Temperature: Interval{lowestTemperature1, highestTemperature1},
		Pressure:    Interval{lowestSaturationPressure, highestPressure1},
	},
	Sources: []*cite.Source{cite.IAPWSIF97, cite.IAPWSR1208, cite.IAPWSR176},
	Note: "IAPWS-IF97 region 1: density within 0.02 %, sound speed within 0.3 %; viscosity within 1 %, without the " +
		"critical enhancement, which is nil here; pure, without dissolved gas",
	limits: waterLimits,
	eval:   waterAt,
}

func waterLimits(s State) (Interval, string) {
	return Interval{saturationPressureWater(s.Temperature), highestPressure1},
		"water boils below the saturation pressure of its temperature"
}

func waterAt(s State) Properties {
	r := waterRegion1(s.Temperature, s.Pressure)
	p := nothing()
	p.Density = 1 / r.volume
	p.Viscosity = viscosityWater(s.Temperature, p.Density)
	p.SoundSpeed = r.soundSpeed
	p.VapourPressure = saturationPressureWater(s.Temperature)
	p.SurfaceTension = surfaceTensionWater(s.Temperature)
	p.HeatCapacityRatio = r.isobaricHeat / r.isochoric
	return p
}
