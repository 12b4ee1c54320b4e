package canon

// flowEntries lists the canonical solutions of flow, free surface and waves,
// and of the stability of coupled solutions.
var flowEntries = []*Entry{
	waveNumberEntry,
	stokesSecondOrderEntry,
	strouhalEntry,
	cylinderDragEntry,
	wakeLockInEntry,
	wakeLockInParameterEntry,
	vortexAmplitudeEntry,
	skopGriffinEntry,
	govardhanWilliamsonEntry,
	theodorsenEntry,
	conveyingPipeEntry,
	flagCriticalEntry,
	panelFlutterEntry,
	panelDivergenceEntry,
	gallopingSpeedEntry,
	gallopingFactorEntry,
	tubeArrayCriticalEntry,
	flatPlateEntry,
	prandtlGlauertEntry,
	isentropicDensityChangeEntry,
	explicitCouplingEntry,
	compressibleCouplingEntry,
	fixedPointRelaxationEntry,
}
