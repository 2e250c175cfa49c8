package model

import (
	"math"

	"hotfront/model/drive"
	"hotfront/model/gas"
	"hotfront/model/metal"
)

// groundPowerUnit is the published 3 kW engine GPU-3 (NASA CR-135382, CR-168088: dimensions in
// testdata/reference/ground_power_unit_geometry.csv, from memory as marked there). Ducts take the
// volumes of that table that are in neither tubes, matrix nor spaces.
func groundPowerUnit(g gas.Kind, rpm float64) Engine {
	const mm, cm3 = 1e-3, 1e-6
	return Engine{
		Layout: Beta, Gas: g, ChargePressure: 6.9e6, Speed: rpm / 60,
		Drive:              Drive{Kind: drive.Rhombic, RodLength: 46 * mm, CrankRadius: 13.8 * mm, Eccentricity: 20.8 * mm},
		Displacer:          Reciprocator{Bore: 69.9 * mm, Rod: 9.52 * mm, Length: 43 * mm, Gap: 0.15 * mm, Wall: 1.59 * mm},
		Piston:             Reciprocator{Bore: 69.9 * mm},
		Cylinder:           Cylinder{Wall: 5 * mm, Alloy: metal.S31000},
		ExpansionClearance: 12.5 * cm3, CompressionClearance: 21.07 * cm3,
		Heater: Heater{TubeCount: 40, TubeBore: 3.02 * mm, TubeWall: 0.905 * mm, TubeLength: 245.3 * mm, HeatedLength: 155.4 * mm,
			EndLoss: 1.5, Alloy: metal.N08810, FluxPeaking: 1, DesignLife: 3.6e7, StressFactor: 1.5},
		Regenerator: Regenerator{Kind: WovenScreen, Count: 8, Diameter: 22.6 * mm, Length: 22.6 * mm, WireDiameter: 0.04 * mm, Porosity: 0.697,
			Alloy: metal.S30400, CanisterWall: 1.5 * mm, CanisterAlloy: metal.S31000},
		Cooler: Cooler{TubeCount: 312, TubeBore: 1.08 * mm, TubeWall: 0.255 * mm, TubeLength: 46.1 * mm, CooledLength: 35.5 * mm,
			EndLoss: 1.5, Alloy: metal.S30400},
		HotDuct:  Duct{Volume: (2.74 + 7.67 + 7.36 + 2.85) * cm3},
		ColdDuct: Duct{Volume: (2.59 + 2.18) * cm3},
		Heat:     Heat{Kind: HeatTubeGas, Temperature: 950},
		Coolant:  Coolant{Inlet: 288, Flow: 0.3, Film: 6000},
	}
}

// gammaSet is an invented gamma machine for heat and power.
func gammaSet() Engine {
	const mm, cm3 = 1e-3, 1e-6
	return Engine{
		Layout: Gamma, Gas: gas.Helium, ChargePressure: 60e5, Speed: 1000.0 / 60,
		Drive:              Drive{Kind: drive.SliderCrank, PhaseAngle: math.Pi / 2, RodLength: 150 * mm},
		Displacer:          Reciprocator{Bore: 90 * mm, Stroke: 50 * mm, Rod: 14 * mm, Length: 150 * mm, Gap: 0.3 * mm, Wall: 1 * mm, SealGap: 0.01 * mm, SealLength: 15 * mm},
		Piston:             Reciprocator{Bore: 80 * mm, Stroke: 50 * mm, SealGap: 0.01 * mm, SealLength: 15 * mm},
		Cylinder:           Cylinder{Wall: 4 * mm, Alloy: metal.N08810},
		ExpansionClearance: 25 * cm3, CompressionClearance: 20 * cm3,
		Heater: Heater{TubeCount: 36, TubeBore: 4 * mm, TubeWall: 1 * mm, TubeLength: 300 * mm, HeatedLength: 250 * mm,
			EndLoss: 1.5, Alloy: metal.N08810, RingDiameter: 140 * mm, FluxPeaking: 1.3, DesignLife: 40000 * 3600, StressFactor: 1.5},
		Regenerator: Regenerator{Kind: WovenScreen, Count: 1, Diameter: 80 * mm, Length: 50 * mm, WireDiameter: 0.06 * mm, Porosity: 0.7,
			Alloy: metal.S30400, CanisterWall: 1.5 * mm, CanisterAlloy: metal.N08810},
		Cooler: Cooler{TubeCount: 200, TubeBore: 1.5 * mm, TubeWall: 0.5 * mm, TubeLength: 60 * mm, CooledLength: 60 * mm,
			EndLoss: 1.5, Alloy: metal.S31600, ShellDiameter: 80 * mm},
		Heat:    Heat{Kind: HeatTubeWall, Temperature: 973},
		Coolant: Coolant{Inlet: 313, Flow: 0.2, Film: 6000},
	}
}
