package model

import (
	"math"
	"math/rand/v2"

	"hotfront/model/drive"
	"hotfront/model/gas"
	"hotfront/model/heat"
	"hotfront/model/metal"
)

// class is one class of machines with the ranges usual for it (typical figures of the field, from
// memory). Ranges with both ends above zero are drawn evenly in the logarithm.
type class struct {
	name             string
	gases            []gas.Kind
	pressure         [2]float64 // [bar]
	speed            [2]float64 // [rpm]
	hot              [2]float64 // heater metal [degC]
	swept            [2]float64 // [cm3]
	heaterCount      [2]float64
	heaterBore       [2]float64 // [mm]
	heaterLength     [2]float64 // [mm]
	coolerCount      [2]float64
	coolerBore       [2]float64 // [mm]
	coolerLength     [2]float64 // [mm]
	wire             [2]float64 // [mm]
	porosity         [2]float64
	matrixLength     [2]float64 // [mm]
	leastEfficiency  float64    // below it a design is no good member of its class [-]
	smallestDiameter float64    // of the matrix over the bore of the displacer [-]
}

func classes() []class {
	return []class{
		{"heat and power", []gas.Kind{gas.Helium, gas.Nitrogen}, [2]float64{20, 100}, [2]float64{600, 1800}, [2]float64{600, 750},
			[2]float64{50, 1000}, [2]float64{20, 80}, [2]float64{3, 8}, [2]float64{150, 500}, [2]float64{100, 600}, [2]float64{1, 4},
			[2]float64{40, 150}, [2]float64{0.04, 0.15}, [2]float64{0.6, 0.9}, [2]float64{30, 80}, 0.15, 0.8},
		{"solar and automotive", []gas.Kind{gas.Hydrogen, gas.Helium}, [2]float64{100, 200}, [2]float64{1500, 4000}, [2]float64{700, 850},
			[2]float64{40, 250}, [2]float64{20, 80}, [2]float64{2, 4}, [2]float64{200, 350}, [2]float64{200, 700}, [2]float64{1, 1.5},
			[2]float64{40, 100}, [2]float64{0.025, 0.06}, [2]float64{0.6, 0.75}, [2]float64{20, 50}, 0.2, 0.8},
		{"low temperature", []gas.Kind{gas.Air, gas.Nitrogen, gas.Helium}, [2]float64{1, 40}, [2]float64{200, 1000}, [2]float64{200, 350},
			[2]float64{100, 5000}, [2]float64{50, 500}, [2]float64{3, 8}, [2]float64{100, 400}, [2]float64{100, 1000}, [2]float64{2, 5},
			[2]float64{50, 200}, [2]float64{0.05, 0.2}, [2]float64{0.7, 0.9}, [2]float64{20, 80}, 0.03, 1},
	}
}

func draw(rng *rand.Rand, r [2]float64) float64 { return r[0] * math.Pow(r[1]/r[0], rng.Float64()) }

// drawEngine draws a machine from the ranges of a class: any layout, sinusoidal or slider-crank.
func drawEngine(rng *rand.Rand, c *class) Engine {
	const mm, cm3 = 1e-3, 1e-6
	e := Engine{
		Layout: Layout(rng.IntN(3)), Gas: c.gases[rng.IntN(len(c.gases))],
		ChargePressure: draw(rng, c.pressure) * 1e5, Speed: draw(rng, c.speed) / 60,
	}
	swept := draw(rng, c.swept) * cm3
	ratio := draw(rng, [2]float64{0.35, 0.8}) // stroke over bore
	bore := math.Cbrt(swept * 4 / (math.Pi * ratio))
	stroke := ratio * bore
	body := Reciprocator{Bore: bore, Stroke: stroke, Length: draw(rng, [2]float64{1, 2}) * bore,
		Gap: draw(rng, [2]float64{0.15, 0.4}) * mm, Wall: 1 * mm, SealGap: 0.008 * mm, SealLength: 15 * mm}
	piston := Reciprocator{Bore: bore, Stroke: stroke, SealGap: 0.008 * mm, SealLength: 20 * mm}
	e.Drive = Drive{Kind: drive.Kind(rng.IntN(2)), PhaseAngle: draw(rng, [2]float64{70, 120}) * math.Pi / 180, RodLength: 2.5 * stroke}
	if e.Layout == Alpha {
		e.ExpansionPiston, e.CompressionPiston = body, piston
	} else {
		body.Rod = 0.15 * bore
		e.Displacer, e.Piston = body, piston
	}
	e.Cylinder = Cylinder{Wall: max(2*mm, 0.05*bore), Alloy: metal.N08810}
	e.ExpansionClearance = draw(rng, [2]float64{0.05, 0.15}) * swept
	e.CompressionClearance = draw(rng, [2]float64{0.05, 0.15}) * swept
	e.Heater = Heater{TubeCount: int(draw(rng, c.heaterCount)), TubeBore: draw(rng, c.heaterBore) * mm, TubeLength: draw(rng, c.heaterLength) * mm,
		EndLoss: 1.5, Alloy: metal.N08810, FluxPeaking: 1.2, DesignLife: 40000 * 3600, StressFactor: 1.5}
	e.Heater.TubeWall = 0.25 * e.Heater.TubeBore
	e.Heater.HeatedLength = (0.7 + 0.3*rng.Float64()) * e.Heater.TubeLength
	e.Regenerator = Regenerator{Kind: MatrixKind(rng.IntN(2)), Count: 1, Diameter: bore * draw(rng, [2]float64{c.smallestDiameter, 1.5}),
		Length: draw(rng, c.matrixLength) * mm, WireDiameter: draw(rng, c.wire) * mm, Porosity: draw(rng, c.porosity),
		Alloy: metal.S31600, CanisterWall: 1.5 * mm, CanisterAlloy: metal.S31000}
	e.Cooler = Cooler{TubeCount: int(draw(rng, c.coolerCount)), TubeBore: draw(rng, c.coolerBore) * mm, TubeLength: draw(rng, c.coolerLength) * mm,
		TubeWall: 0.5 * mm, EndLoss: 1.5, Alloy: metal.S31600}
	e.Cooler.CooledLength = (0.8 + 0.2*rng.Float64()) * e.Cooler.TubeLength
	e.Heat = Heat{Kind: HeatTubeWall, Temperature: 273.15 + draw(rng, c.hot)}
	if rng.IntN(4) == 0 {
		e.Heat.Kind = HeatTubeGas
	}
	e.Coolant = Coolant{Inlet: 283 + 40*rng.Float64(), Flow: 2e-7 * e.ChargePressure * swept * e.Speed * 20, Film: 5000}
	if rng.IntN(3) == 0 {
		e.HotDuct = Duct{Volume: 0.1 * swept, Area: 0.02 * bore, Loss: 0}
	}
	return e
}

// sensible tells whether an evaluated design of a class looks like a machine that somebody would build:
// dead volume, flow loss, speeds and efficiency in the ranges usual in the field, a little widened.
func sensible(c *class, p *Performance) bool {
	return p.Cause == None && p.DeadVolumeRatio > 0.5 && p.DeadVolumeRatio < 2.5 && p.FlowLoss < 0.25*p.PVPower &&
		p.PistonSpeed > 0.5 && p.PistonSpeed < 8 && p.Mach < 0.15 && p.BrakeEfficiency > c.leastEfficiency && p.HeaterHeatFlux < 60e4
}

// drawSensible draws designs of a class until one is sensible on the production grid.
func drawSensible(rng *rand.Rand, c *class, w *Workspace) (Engine, Performance) {
	none := NoCorrections()
	var p Performance
	for range 10000 {
		e := drawEngine(rng, c)
		Evaluate(&p, &e, &none, w)
		if sensible(c, &p) {
			return e, p
		}
	}
	panic("no sensible design among ten thousand: the model is broken")
}

// wildEngine draws a design from a box far wider than any study would give: every length over
// decades, pressures from 0.5 to 300 bar, speeds from 30 to 12000 rpm, any gas, layout and drive.
func wildEngine(rng *rand.Rand) Engine {
	lg := func(a, b float64) float64 { return draw(rng, [2]float64{a, b}) }
	const mm = 1e-3
	bore := lg(10, 500) * mm
	stroke := bore * lg(0.05, 2)
	body := Reciprocator{Bore: bore, Stroke: stroke, Rod: bore * 0.5 * rng.Float64(), Length: bore * lg(0.3, 4), Gap: lg(0.01, 2) * mm, Wall: lg(0.2, 3) * mm,
		SealGap: lg(0.001, 0.1) * mm, SealLength: lg(5, 50) * mm}
	piston := Reciprocator{Bore: bore * lg(0.5, 2), Stroke: stroke * lg(0.5, 2), SealGap: lg(0.001, 0.1) * mm, SealLength: lg(5, 50) * mm}
	swept := math.Pi / 4 * bore * bore * stroke
	alloys := metal.Alloys()
	alloy := func() metal.Alloy { return alloys[rng.IntN(len(alloys))] }
	e := Engine{
		Layout: Layout(rng.IntN(4)), Cylinders: 3 + rng.IntN(10), Gas: gas.Kinds()[rng.IntN(4)], ChargePressure: lg(0.5, 300) * 1e5, Speed: lg(30, 12000) / 60,
		Drive: Drive{Kind: drive.Kind(rng.IntN(4)), PhaseAngle: 2 * math.Pi * rng.Float64(), RodLength: stroke * lg(0.6, 5),
			CrankRadius: stroke * lg(0.2, 0.6), Eccentricity: stroke * lg(0.3, 1), YokeArm: stroke * lg(0.5, 3), YokeHalfWidth: stroke * lg(0.5, 3),
			LinkLength: stroke * lg(0.5, 5), SpeedFluctuation: 0.02, CylinderAngle: math.Pi * rng.Float64(), CylinderCircle: bore * lg(1, 5)},
		Cylinder:           Cylinder{Wall: lg(0.5, 20) * mm, Alloy: alloy()},
		ExpansionClearance: swept * lg(0.001, 2), CompressionClearance: swept * lg(0.001, 2), BufferVolume: swept * lg(0.5, 50) * float64(rng.IntN(2)),
		Heater: Heater{TubeCount: int(lg(1, 1000)), TubeBore: lg(0.5, 20) * mm, TubeWall: lg(0.2, 5) * mm, TubeLength: lg(20, 2000) * mm,
			EndLoss: 5 * rng.Float64(), Alloy: alloy(), FluxPeaking: 1 + rng.Float64(), DesignLife: lg(1e4, 1e9), StressFactor: 1 + rng.Float64()},
		Regenerator: Regenerator{Kind: MatrixKind(rng.IntN(2)), Count: 1 + rng.IntN(8), Diameter: bore * lg(0.2, 4), Length: lg(2, 300) * mm,
			WireDiameter: lg(0.01, 1) * mm, Porosity: 0.25 + 0.73*rng.Float64(), Alloy: alloy(), CanisterWall: lg(0.2, 5) * mm, CanisterAlloy: alloy()},
		Cooler: Cooler{TubeCount: int(lg(1, 3000)), TubeBore: lg(0.3, 10) * mm, TubeWall: lg(0.1, 2) * mm, TubeLength: lg(10, 1000) * mm,
			EndLoss: 5 * rng.Float64(), Alloy: alloy()},
		Heat:    wildHeat(rng, bore),
		Coolant: Coolant{Inlet: 260 + 80*rng.Float64(), Flow: lg(0.001, 10), Film: lg(100, 20000)},
	}
	e.Heater.HeatedLength = e.Heater.TubeLength * lg(0.1, 1)
	e.Cooler.CooledLength = e.Cooler.TubeLength * lg(0.1, 1)
	e.Heater.Rows = 1 + rng.IntN(4)
	if e.Heat.Kind == HeatBurner || rng.IntN(2) == 0 {
		e.Heater.RingDiameter = bore * lg(1, 20)
	}
	switch { // what a study refuses
	case e.Layout == Alpha && e.Drive.Kind == drive.Rhombic, e.Layout == Beta && e.Drive.Kind == drive.RossYoke,
		e.Layout == DoubleActing && e.Drive.Kind > drive.SliderCrank:
		e.Drive.Kind = drive.Kind(rng.IntN(2))
	}
	body.Mass, piston.Mass = lg(0.01, 100)*float64(rng.IntN(2)), lg(0.01, 100)
	if e.Layout == Alpha {
		body.Rod = 0
		e.ExpansionPiston, e.CompressionPiston = body, piston
	} else {
		if e.Layout == Beta {
			piston.Bore = body.Bore
		}
		e.Displacer, e.Piston = body, piston
		if e.Layout == DoubleActing {
			e.Piston = body
		}
	}
	for _, d := range []*Duct{&e.ExpansionDuct, &e.HotDuct, &e.ColdDuct, &e.CompressionDuct} {
		if rng.IntN(2) == 0 {
			*d = Duct{Volume: swept * lg(0.001, 1), Area: bore * bore * lg(0.001, 1), Loss: 3 * rng.Float64()}
		}
	}
	return e
}

// wildHeat draws any way to heat the engine; burner and receiver may be of any size against it.
func wildHeat(rng *rand.Rand, bore float64) Heat {
	lg := func(a, b float64) float64 { return draw(rng, [2]float64{a, b}) }
	kinds := heat.FuelKinds()
	power := math.Pow(bore, 3) * lg(1e5, 1e9)
	h := Heat{
		Kind: HeatKind(rng.IntN(4)), Temperature: lg(350, 1400),
		Burner: Burner{
			FuelKind: kinds[rng.IntN(len(kinds)-1)], FuelPower: power * float64(rng.IntN(2)), ExcessAir: lg(1, 5),
			PreheaterEffectiveness: 0.99 * rng.Float64() * float64(rng.IntN(2)), Ambient: 260 + 60*rng.Float64(),
			CasingShare: 0.3 * rng.Float64(), CasingConductance: lg(0.01, 10) * float64(rng.IntN(2)),
			Arrangement: heat.Arrangement(rng.IntN(2)), RowPitch: lg(0.5, 5), FlameEmissivity: rng.Float64(), WallEmissivity: 0.1 + 0.9*rng.Float64(),
		},
		Receiver: Receiver{
			Power: power, ApertureDiameter: bore * lg(0.1, 10), WallArea: bore * bore * lg(1, 100), Absorptance: rng.Float64(), Emittance: rng.Float64(),
			WindowTransmittance: rng.Float64(), WindowThermal: rng.Float64(), Film: lg(1, 100), CasingConductance: lg(0.01, 10), Ambient: 260 + 60*rng.Float64(),
		},
	}
	if rng.IntN(2) == 0 {
		h.Burner.Fins = heat.Fins{Kind: heat.FinKind(1 + rng.IntN(2)), Height: lg(0.5, 10) * 1e-3, Thickness: lg(0.1, 2) * 1e-3, Pitch: lg(0.5, 10) * 1e-3, Count: 1 + rng.IntN(20)}
	}
	return h
}
