package model

import (
	"hotfront/model/cycle"
	"hotfront/model/gas"
	"hotfront/model/metal"
)

const pi = 3.14159265358979323846

// atmosphere is the pressure outside the heater tubes [Pa].
const atmosphere = 101325

const (
	longestLife = 1e9 * 3600 // stands for a longer creep life [s]
	noWall      = 1.0        // stands for no wall being thick enough [m]
	poisson     = 0.3        // Poisson's ratio of steels and nickel alloys, handbook value from memory [-]
)

// setMetal works out heat flux, metal temperatures and stress of the heater, and the masses.
//
// Round each tube, and from tube to tube, the flux peaks by FluxPeaking; there the wall stands above the gas
// by that much more,
//
//	T = Tgas + FluxPeaking (Touter - Tgas),
//
// for film and wall carry the local flux. The hottest metal is where the gas is coldest along the tubes.
func (w *Workspace) setMetal(dst *Performance, e *Engine) {
	h, g := &e.Heater, &w.geometry
	heat := w.heat(cycle.PartHeater) * e.Speed
	dst.HeaterHeatFlux = heat / (float64(h.TubeCount) * pi * g.heaterOuter * h.HeatedLength)
	coldest := dst.HeaterGasTemperature
	for i := range w.Path.N {
		if w.Path.Cells[i].Part == cycle.PartHeater {
			coldest = min(coldest, w.Cycle.Temperature[i])
		}
	}
	dst.HeaterMetalTemperature = coldest + h.FluxPeaking*(dst.HeaterOuterTemperature-coldest)

	alloy := metal.Of(h.Alloy)
	tubes := vessel{metal: &alloy, bore: h.TubeBore, wall: h.TubeWall, temperature: dst.HeaterMetalTemperature}
	tubes.solve(dst, h)
	dst.HeaterHoopStress = tubes.stress
	dst.HeaterAllowableStress = tubes.allowable
	dst.HeaterStressUtilisation = tubes.utilisation
	dst.HeaterWallNeeded = tubes.needed
	dst.HeaterLife, dst.HeaterLifeLow, dst.HeaterLifeHigh = longestLife, longestLife, longestLife
	if tubes.stress > 0 {
		stress := tubes.stress * h.StressFactor
		life, _ := alloy.RuptureLife(dst.HeaterMetalTemperature, stress)
		low, high := alloy.LifeBand(dst.HeaterMetalTemperature, stress)
		dst.HeaterLife, dst.HeaterLifeLow, dst.HeaterLifeHigh = min(life, longestLife), min(low, longestLife), min(high, longestLife)
	}
	mean := 0.5 * (dst.HeaterOuterTemperature + dst.HeaterInnerTemperature)
	across := h.FluxPeaking * (dst.HeaterOuterTemperature - dst.HeaterInnerTemperature)
	dst.HeaterThermalStress = metal.ThermalStressBore(alloy.Young(mean), alloy.Expansion(mean), poisson,
		dst.HeaterMetalTemperature-across, dst.HeaterMetalTemperature, 0.5*h.TubeBore, 0.5*g.heaterOuter)
	if h.RingDiameter > 0 {
		dst.HeaterPitchRatio = g.pitchRatio(e)
	}
	dst.CoolerBundleDiameter = g.bundleDiameter(&e.Cooler)

	r := &e.Regenerator
	wire, canister, cylinder := metal.Of(r.Alloy), metal.Of(r.CanisterAlloy), metal.Of(e.Cylinder.Alloy)
	// The hot ends of cylinder and canisters are as hot as the bore of the heater tubes, without a peak.
	wall := vessel{metal: &cylinder, bore: g.hot.Bore, wall: e.Cylinder.Wall, temperature: dst.HeaterInnerTemperature}
	wall.solve(dst, h)
	dst.CylinderStressUtilisation, dst.CylinderWallNeeded = wall.utilisation, wall.needed
	can := vessel{metal: &canister, bore: r.Diameter, wall: r.CanisterWall, temperature: dst.HeaterInnerTemperature}
	can.solve(dst, h)
	dst.RegeneratorShellStressUtilisation, dst.RegeneratorShellWallNeeded = can.utilisation, can.needed
	shell := pi * (r.Diameter + r.CanisterWall) * r.CanisterWall
	if r.InnerDiameter > 0 {
		shell += pi * (r.InnerDiameter - r.CanisterWall) * r.CanisterWall
	}
	dst.HotMetalMass = e.circuits() * (alloy.Density*float64(h.TubeCount)*(circle(g.heaterOuter)-circle(h.TubeBore))*h.TubeLength +
		wire.Density*g.matrixVolume*(1-r.Porosity) +
		canister.Density*float64(r.Count)*shell*r.Length +
		cylinder.Density*pi*(g.hot.Bore+e.Cylinder.Wall)*e.Cylinder.Wall*g.hot.Length)
}

// vessel is a cylindrical wall under the working pressure.
type vessel struct {
	metal       *metal.Properties
	bore, wall  float64 // [m]
	temperature float64 // [K]

	stress, allowable, utilisation, needed float64
}

// solve works out stress, allowable stress for the heater's life and factor, and the wall needed.
func (v *vessel) solve(dst *Performance, h *Heater) {
	strength, inRange := v.metal.DesignStrength(v.temperature, h.DesignLife)
	if !inRange {
		dst.Warnings |= WarnCreepRange
	}
	v.allowable = strength / h.StressFactor
	v.needed = min(metal.WallNeeded(v.allowable, dst.PressureMax, atmosphere, 0.5*v.bore), noWall)
	if v.wall == 0 { // not given: nothing to judge
		return
	}
	v.stress = metal.HoopStressBore(dst.PressureMax, atmosphere, 0.5*v.bore, 0.5*v.bore+v.wall)
	v.utilisation = max(v.stress, 0) / v.allowable
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
