package model

import (
	"hotfront/model/cycle"
	"hotfront/model/gas"
	"hotfront/model/metal"
)

const pi = 3.14159265358979323846

// atmosphere is the pressure outside the heater tubes [Pa].
const atmosphere = 101325

// setMetal works out heat flux, metal temperatures and stress of the heater, and the masses.
//
// The flux peaks somewhere by FluxPeaking; there the wall stands above the gas by that much more:
//
//	T = Tgas + FluxPeaking (Touter - Tgas)
//
// for all three resistances (film, wall) carry the local flux.
func (w *Workspace) setMetal(dst *Performance, e *Engine) {
	h, g := &e.Heater, &w.geometry
	heat := w.heat(cycle.PartHeater) * e.Speed
	dst.HeaterHeatFlux = heat / (float64(h.TubeCount) * pi * g.heaterOuter * h.HeatedLength)
	dst.HeaterMetalTemperature = dst.HeaterGasTemperature + h.FluxPeaking*(dst.HeaterOuterTemperature-dst.HeaterGasTemperature)

	alloy := metal.Of(h.Alloy)
	dst.HeaterHoopStress = metal.HoopStressBore(dst.PressureMax, atmosphere, 0.5*h.TubeBore, 0.5*g.heaterOuter)
	strength, inRange := alloy.DesignStrength(dst.HeaterMetalTemperature, h.DesignLife)
	if !inRange {
		dst.Warnings |= WarnCreepRange
	}
	dst.HeaterAllowableStress = strength / h.StressFactor
	dst.HeaterStressUtilisation = max(dst.HeaterHoopStress, 0) / dst.HeaterAllowableStress
	if h.RingDiameter > 0 {
		dst.HeaterPitchRatio = g.pitchRatio(h)
	}
	dst.CoolerBundleDiameter = g.bundleDiameter(&e.Cooler)

	r := &e.Regenerator
	wire, canister, cylinder := metal.Of(r.Alloy), metal.Of(r.CanisterAlloy), metal.Of(e.Cylinder.Alloy)
	shell := pi * (r.Diameter + r.CanisterWall) * r.CanisterWall
	if r.InnerDiameter > 0 {
		shell += pi * (r.InnerDiameter - r.CanisterWall) * r.CanisterWall
	}
	dst.HotMetalMass = alloy.Density*float64(h.TubeCount)*(circle(g.heaterOuter)-circle(h.TubeBore))*h.TubeLength +
		wire.Density*g.matrixVolume*(1-r.Porosity) +
		canister.Density*float64(r.Count)*shell*r.Length +
		cylinder.Density*pi*(g.hot.Bore+e.Cylinder.Wall)*e.Cylinder.Wall*g.hot.Length
}

// setWarnings marks where a law was used beyond its range.
func (w *Workspace) setWarnings(dst *Performance, e *Engine) {
	fr, p, r := &w.friction, &w.Path, &e.Regenerator
	if !matrixInRange(p, fr.reMax[cycle.PartRegenerator], r.Porosity) {
		dst.Warnings |= WarnScreenRange
	}
	if !tubeInRange(fr.reMax[cycle.PartHeater], e.Heater.TubeBore/e.Heater.TubeLength) ||
		!tubeInRange(fr.reMax[cycle.PartCooler], e.Cooler.TubeBore/e.Cooler.TubeLength) {
		dst.Warnings |= WarnTubeRange
	}
	if dst.Mach > 0.2 {
		dst.Warnings |= WarnMach
	}
	if dst.PistonSpeed > 6 {
		dst.Warnings |= WarnPistonSpeed
	}
	if !gasInRange(&w.gas, dst) {
		dst.Warnings |= WarnGasRange
	}
	if e.Heater.RingDiameter == 0 || e.Cooler.ShellDiameter == 0 {
		dst.Warnings |= WarnFitUnchecked
	}
}

func gasInRange(g *gas.Gas, p *Performance) bool {
	return g.Range.Contains(min(p.CompressionTemperature, p.CoolerWallTemperature), p.PressureMax) &&
		g.Range.Contains(max(p.HeaterMetalTemperature, p.ExpansionTemperature), p.PressureMax)
}
