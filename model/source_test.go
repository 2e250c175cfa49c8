package model

import (
	"math"
	"testing"

	"hotfront/model/heat"
)

// pelletBurner puts the invented gamma set on a burner of wood pellets.
func pelletBurner() Engine {
	e := gammaSet()
	e.Heater.Rows = 2
	e.Heater.RingDiameter = 0.11
	e.Heat.Kind = HeatBurner
	e.Heat.Burner = Burner{
		FuelKind: heat.WoodPellets, ExcessAir: 1.5, PreheaterEffectiveness: 0.7, Ambient: 298.15, CasingShare: 0.03,
		Arrangement: heat.Staggered, RowPitch: 2, FlameEmissivity: 0.2, WallEmissivity: 0.85,
	}
	return e
}

// dishReceiver puts it behind a cavity receiver.
func dishReceiver(power float64) Engine {
	e := gammaSet()
	e.Heat.Kind = HeatReceiver
	e.Heat.Temperature = 0
	e.Heat.Receiver = Receiver{
		Power: power, ApertureDiameter: 0.14, WallArea: 0.2, Absorptance: 0.9, Emittance: 0.85,
		WindowTransmittance: 1, WindowThermal: 1, Film: 15, CasingConductance: 0.5, Ambient: 293,
	}
	return e
}

func evaluated(t *testing.T, w *Workspace, e *Engine) Performance {
	t.Helper()
	c := NoCorrections()
	var p Performance
	Evaluate(&p, e, &c, w)
	if p.Cause != None {
		t.Fatal(p.Cause)
	}
	return p
}

func within(t *testing.T, what string, got, want, share float64) {
	t.Helper()
	if !(math.Abs(got-want) <= share*math.Abs(want)) {
		t.Errorf("%s: %.8g, want %.8g within %g", what, got, want, share)
	}
}

// TestBurnerBothWays: fuel found for a tube wall, given back, finds that tube wall again; and the cycle is
// that of the wall given without a burner.
func TestBurnerBothWays(t *testing.T) {
	w := NewWorkspace()
	held := pelletBurner()
	a := evaluated(t, w, &held)
	plain := gammaSet()
	b := evaluated(t, w, &plain)
	if a.BrakePower != b.BrakePower || a.HeatIn != b.HeatIn {
		t.Errorf("with a burner %g W of %g W, without %g of %g", a.BrakePower, a.HeatIn, b.BrakePower, b.HeatIn)
	}
	within(t, "fuel power", a.HeatIn+a.Burner.Chimney+a.Burner.Casing, a.FuelPower, 1e-9)
	within(t, "fuel efficiency", a.BrakeEfficiency*a.Burner.Efficiency, a.FuelEfficiency, 1e-9)
	if !(a.Burner.Efficiency > 0.6 && a.Burner.Efficiency < 1 && a.Burner.GasTemperature > 973 && a.Burner.AirTemperature > 400) {
		t.Errorf("no burner of this kind: %+v", a.Burner)
	}

	fed := held
	fed.Heat.Burner.FuelPower, fed.Heat.Temperature = a.FuelPower, 0
	f := evaluated(t, w, &fed)
	// 3e-4 of the heat over the 0.2 % of it a kelvin brings.
	if math.Abs(f.HeaterOuterTemperature-973) > 0.4 {
		t.Errorf("tube wall %.3f K, want 973", f.HeaterOuterTemperature)
	}
	within(t, "brake power", f.BrakePower, a.BrakePower, 2e-3)
	within(t, "fuel power", f.HeatIn+f.Burner.Chimney+f.Burner.Casing, f.FuelPower, 5e-4)
	if math.Abs(f.EnergyResidual) > 1e-3 {
		t.Errorf("energy residual %g", f.EnergyResidual)
	}

	// More fuel, hotter metal and more power; better preheating, hotter too.
	more := fed
	more.Heat.Burner.FuelPower *= 1.1
	m := evaluated(t, w, &more)
	preheated := fed
	preheated.Heat.Burner.PreheaterEffectiveness = 0.85
	p := evaluated(t, w, &preheated)
	for _, hot := range []Performance{m, p} {
		if !(hot.HeaterOuterTemperature > f.HeaterOuterTemperature+10 && hot.BrakePower > f.BrakePower) {
			t.Errorf("wall %g K, %g W, against %g K, %g W", hot.HeaterOuterTemperature, hot.BrakePower, f.HeaterOuterTemperature, f.BrakePower)
		}
	}
}

// TestReceiverWall: the wall temperature found is the one at which the receiver alone, solved the other way
// round, gives the engine's heat.
func TestReceiverWall(t *testing.T) {
	w := NewWorkspace()
	for _, power := range []float64{13e3, 17e3, 25e3} {
		e := dishReceiver(power)
		p := evaluated(t, w, &e)
		r := heat.Receiver{Power: power, ApertureArea: math.Pi / 4 * 0.14 * 0.14, WallArea: 0.2, Absorptance: 0.9, Emittance: 0.85,
			WindowTransmittance: 1, WindowThermal: 1, Film: 15, CasingConductance: 0.5, Ambient: 293}
		wall, fault := r.WallTemperature(p.HeatIn)
		if fault != heat.OK {
			t.Fatal(fault)
		}
		if math.Abs(wall-p.HeaterOuterTemperature) > 3 { // 3e-4 of the heat is this much where re-radiation hardly rises
			t.Errorf("%g W: wall %.2f K, by the receiver alone %.2f K", power, p.HeaterOuterTemperature, wall)
		}
		l := &p.Receiver
		within(t, "radiation", p.HeatIn+l.WindowLoss+l.Reflection+l.Reradiation+l.Convection+l.Casing, power, 5e-4)
		if !(l.Stagnation > p.HeaterOuterTemperature) || math.Abs(p.EnergyResidual) > 1e-3 {
			t.Errorf("%g W: stagnation %g K, wall %g K, residual %g", power, l.Stagnation, p.HeaterOuterTemperature, p.EnergyResidual)
		}
		t.Logf("%5.0f W: wall %.0f K, %.0f W at the shaft, receiver %.3f, %d cycles", power, p.HeaterOuterTemperature, p.BrakePower, l.Efficiency, p.Cycles)
	}
}

func TestSourceCauses(t *testing.T) {
	w := NewWorkspace()
	c := NoCorrections()
	for name, tc := range map[string]struct {
		engine Engine
		want   Cause
	}{
		"no sun":     {dishReceiver(100), SourceTooWeak},
		"ten suns":   {dishReceiver(300e3), SourceTooHot},
		"wide mouth": {with(dishReceiver(19e3), func(e *Engine) { e.Heat.Receiver.ApertureDiameter = 0.6 }), ApertureTooWide},
		"no ring":    {with(pelletBurner(), func(e *Engine) { e.Heater.RingDiameter = 0 }), BadInput},
		"lean air":   {with(pelletBurner(), func(e *Engine) { e.Heat.Burner.ExcessAir = 0.9 }), BadInput},
		"tubes meet": {with(pelletBurner(), func(e *Engine) { e.Heater.RingDiameter, e.Heat.Burner.RowPitch = 0.05, 0.2 }), BankImpossible},
		"flat rows":  {with(pelletBurner(), func(e *Engine) { e.Heat.Burner.Arrangement, e.Heat.Burner.RowPitch = heat.InLine, 40 }), BankRange},
		"match":      {with(pelletBurner(), func(e *Engine) { e.Heat.Burner.FuelPower = 50 }), BankRange},
		"cold flame": {with(pelletBurner(), func(e *Engine) { e.Heat.Burner.ExcessAir, e.Heat.Burner.PreheaterEffectiveness = 6, 0 }), SourceTooWeak},
	} {
		var p Performance
		Evaluate(&p, &tc.engine, &c, w)
		if p.Cause != tc.want {
			t.Errorf("%s: %v, want %v", name, p.Cause, tc.want)
		}
	}
}

func with(e Engine, change func(*Engine)) Engine {
	change(&e)
	return e
}

func TestSourceAllocs(t *testing.T) {
	w := NewWorkspace()
	c := NoCorrections()
	burner, dish := pelletBurner(), dishReceiver(19e3)
	burner.Heat.Burner.FuelPower = 20e3
	var p Performance
	for _, e := range []*Engine{&burner, &dish} {
		if n := testing.AllocsPerRun(5, func() { Evaluate(&p, e, &c, w) }); n != 0 {
			t.Errorf("%v allocations", n)
		}
	}
}

// BenchmarkSource is an evaluation whose tube wall follows from the receiver, to be held against BenchmarkEvaluate.
func BenchmarkSource(b *testing.B) {
	w := NewWorkspace()
	c := NoCorrections()
	e := dishReceiver(19e3)
	var p Performance
	b.ReportAllocs()
	for b.Loop() {
		Evaluate(&p, &e, &c, w)
	}
	b.ReportMetric(float64(p.Cycles), "cycles")
}
