package model

import (
	"testing"

	"hotfront/model/gas"
)

func TestLook(t *testing.T) {
	c := NoCorrections()
	w := NewWorkspace()
	var p Performance
	for _, e := range []Engine{groundPowerUnit(gas.Helium, 2500), groundPowerUnit(gas.Hydrogen, 3500), gammaSet()} {
		Evaluate(&p, &e, &c, w)
		t.Logf("%v cycles %d bal %.2e prof %.2e res %.2e", p.Cause, p.Cycles, w.Cycle.Balance, w.Cycle.Profile, p.EnergyResidual)
		t.Logf("pv %.0f ind %.0f brake %.0f heat %.0f cool %.0f eff %.3f fric %.0f [h %.0f r %.0f c %.0f] pmax %.3g pmin %.3g Te %.0f Tc %.0f Tgas %.0f Touter %.0f Tin %.0f", p.PVPower, p.IndicatedPower, p.BrakePower, p.HeatIn, p.CoolantHeat, p.BrakeEfficiency, p.FlowLoss, p.HeaterFlowLoss, p.RegeneratorFlowLoss, p.CoolerFlowLoss, p.PressureMax, p.PressureMin, p.ExpansionTemperature, p.CompressionTemperature, p.HeaterGasTemperature, p.HeaterOuterTemperature, p.HeaterInnerTemperature)
		t.Logf("%+v", p.Losses)
		t.Logf("regen eff %.4f NTU %.1f swing %.1f heat %.0f flux %.3g stress %.3g allow %.3g dead %.3g ratio %.2f cool wall %.0f gas %.0f out %.0f warn %b", p.RegeneratorEffectiveness, p.RegeneratorNTU, p.RegeneratorMatrixSwing, p.RegeneratorHeat, p.HeaterHeatFlux, p.HeaterHoopStress, p.HeaterAllowableStress, p.DeadVolume, p.DeadVolumeRatio, p.CoolerWallTemperature, p.CoolerGasTemperature, p.CoolantOutlet, p.Warnings)
		for i := range w.Path.N {
			t.Logf("  cell %d kind %d T %.1f wall %.1f V %.2g UA %.3g M %.3g H %.3g Q %.3g", i, w.Path.Cells[i].Kind, w.Cycle.Temperature[i], w.Cycle.Wall[i], w.Path.Cells[i].Volume, w.Cycle.FilmMean[i], w.Cycle.FlowMean[i], w.Cycle.Enthalpy[i], w.Cycle.Heat[i])
		}
	}
}

func BenchmarkEvaluate(b *testing.B) {
	c := NoCorrections()
	w := NewWorkspace()
	e := gammaSet()
	var p Performance
	b.ReportAllocs()
	for b.Loop() {
		Evaluate(&p, &e, &c, w)
	}
}
