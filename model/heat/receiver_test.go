package heat

import (
	"math"
	"math/rand/v2"
	"testing"
)

// dish is an invented receiver for tests.
func dish() Receiver {
	return Receiver{
		Power: 20e3, ApertureArea: 0.03, WallArea: 0.2, Absorptance: 0.9, Emittance: 0.85,
		WindowTransmittance: 0.93, WindowThermal: 0.6, Film: 10, CasingConductance: 0.3, Ambient: 293.15,
	}
}

// TestCavity holds the effective emittance to its limits and to the series of reflections it stands for.
func TestCavity(t *testing.T) {
	for _, c := range []struct{ wall, ratio, want float64 }{
		{0.4, 1, 0.4}, {1, 0.3, 1}, {0, 0.3, 0}, {0.3, 1e-12, 1}, {0.5, 0.5, 1 / 1.5},
	} {
		if got, fault := CavityEmittance(c.wall, c.ratio); fault != OK || !(math.Abs(got-c.want) < 1e-11) {
			t.Errorf("wall %g, ratio %g: %g, want %g %v", c.wall, c.ratio, got, c.want, fault)
		}
	}
	sum, light := 0.0, 1.0
	for range 500 {
		sum += 0.35 * light
		light *= 0.65 * (1 - 0.2)
	}
	if got, _ := CavityEmittance(0.35, 0.2); !(math.Abs(got/sum-1) < 1e-12) {
		t.Errorf("%g, series %g", got, sum)
	}
	for _, c := range [][2]float64{{1.1, 0.5}, {-0.1, 0.5}, {0.5, 0}, {0.5, 1.1}, {math.NaN(), 0.5}, {0.5, math.NaN()}} {
		if _, fault := CavityEmittance(c[0], c[1]); fault != BadShare {
			t.Errorf("wall %g, ratio %g: %v", c[0], c[1], fault)
		}
	}
}

// TestReceiverLimits: closed forms.
func TestReceiverLimits(t *testing.T) {
	// Radiation alone: T^4 = Ta^4 + tw a P/(tt e sigma A).
	r := dish()
	r.Film, r.CasingConductance = 0, 0
	a, _ := CavityEmittance(0.9, 0.15)
	e, _ := CavityEmittance(0.85, 0.15)
	want := math.Pow(math.Pow(293.15, 4)+0.93*a*20e3/(0.6*e*stefanBoltzmann*0.03), 0.25)
	if got, fault := r.Stagnation(); fault != OK || !(math.Abs(got/want-1) < 1e-13) {
		t.Errorf("stagnation %g K, want %g K %v", got, want, fault)
	}
	// A black plate in the sun, 1000 W/m2, against a sky at 0 K almost: (1000/sigma)^1/4 = 364.4 K.
	plate := Receiver{Power: 1000, ApertureArea: 1, WallArea: 1, Absorptance: 1, Emittance: 1, WindowTransmittance: 1, WindowThermal: 1, Ambient: 1e-3}
	if got, _ := plate.Stagnation(); !(math.Abs(got-364.4) < 0.05) {
		t.Errorf("black plate in the sun: %g K", got)
	}
	// Linear losses alone: T = Ta + tw a P/(h A + K).
	r = dish()
	r.WindowThermal = 0
	want = 293.15 + 0.93*a*20e3/(10*0.03+0.3)
	if got, _ := r.Stagnation(); !(math.Abs(got/want-1) < 1e-13) {
		t.Errorf("linear losses: %g K, want %g K", got, want)
	}
	r.Film, r.CasingConductance = 0, 0
	if _, fault := r.Stagnation(); fault != LossFree {
		t.Errorf("no loss: %v", fault)
	}
	// The black cavity of a given concentration without convection: efficiency 1 - sigma T^4/flux (ambient near 0 K).
	black := Receiver{Power: 1e6, ApertureArea: 1, WallArea: 1e9, Absorptance: 0.5, Emittance: 0.5, WindowTransmittance: 1, WindowThermal: 1, Ambient: 1}
	var d ReceiverBalance
	if fault := black.Solve(&d, 1000); fault != OK || !(math.Abs(d.Efficiency-(1-5.670374419e-8*1e12/1e6)) < 1e-8) {
		t.Errorf("black cavity: efficiency %g %v", d.Efficiency, fault)
	}
	// At ambient temperature nothing is lost but reflections.
	r = dish()
	r.Solve(&d, 293.15)
	if d.Reradiation != 0 || d.Convection != 0 || d.Casing != 0 || !(math.Abs(d.Heat/(0.93*a*20e3)-1) < 1e-14) {
		t.Errorf("at ambient temperature: %+v", d)
	}
}

// TestReceiverRandom: the ledger closes, the slope is that of the heat, WallTemperature inverts Solve.
func TestReceiverRandom(t *testing.T) {
	r := rand.New(rand.NewPCG(5, 1))
	for i := range 2000 {
		v := Receiver{
			Power: 5e4 * r.Float64(), ApertureArea: 0.001 + 0.1*r.Float64(), Absorptance: r.Float64(), Emittance: r.Float64(),
			WindowTransmittance: r.Float64(), WindowThermal: r.Float64(), Film: 30 * r.Float64(), CasingConductance: r.Float64(), Ambient: 250 + 60*r.Float64(),
		}
		v.WallArea = v.ApertureArea * (1 + 9*r.Float64())
		Tw := 250 + 1500*r.Float64()
		var d, up, down ReceiverBalance
		if fault := v.Solve(&d, Tw); fault != OK {
			t.Fatalf("receiver %d: %v", i, fault)
		}
		scale := d.Incident + d.Reradiation + d.Convection + d.Casing
		if e := d.Incident - d.WindowLoss - d.Reflection - d.Reradiation - d.Convection - d.Casing - d.Heat; !(math.Abs(e) < 1e-12*scale) {
			t.Errorf("receiver %d: ledger open by %g W", i, e)
		}
		v.Solve(&up, Tw+0.1)
		v.Solve(&down, Tw-0.1)
		if e := (up.Heat-down.Heat)/0.2/d.Slope - 1; !(math.Abs(e) < 1e-6) {
			t.Errorf("receiver %d: slope off by %g", i, e)
		}
		if T, fault := v.WallTemperature(d.Heat); fault != OK || !(math.Abs(T/Tw-1) < 1e-9) {
			t.Errorf("receiver %d: wall %g K, want %g K %v", i, T, Tw, fault)
		}
	}
}

func TestReceiverFaults(t *testing.T) {
	for _, c := range []struct {
		name   string
		change func(r *Receiver)
		Tw     float64
		want   Fault
	}{
		{"negative power", func(r *Receiver) { r.Power = -1 }, 900, BadNumber},
		{"film not a number", func(r *Receiver) { r.Film = math.NaN() }, 900, BadNumber},
		{"no aperture", func(r *Receiver) { r.ApertureArea = 0 }, 900, BadNumber},
		{"wall smaller than aperture", func(r *Receiver) { r.WallArea = 0.02 }, 900, BadNumber},
		{"window above 1", func(r *Receiver) { r.WindowTransmittance = 1.01 }, 900, BadShare},
		{"thermal share below 0", func(r *Receiver) { r.WindowThermal = -0.1 }, 900, BadShare},
		{"absorptance", func(r *Receiver) { r.Absorptance = 2 }, 900, BadShare},
		{"emittance", func(r *Receiver) { r.Emittance = math.NaN() }, 900, BadShare},
		{"wall at 0 K", func(r *Receiver) {}, 0, TemperatureRange},
		{"wall not a number", func(r *Receiver) {}, math.NaN(), TemperatureRange},
		{"good", func(r *Receiver) {}, 900, OK},
	} {
		r := dish()
		c.change(&r)
		var d ReceiverBalance
		if got := r.Solve(&d, c.Tw); got != c.want {
			t.Errorf("%s: %q, want %q", c.name, got, c.want)
		}
	}
	r := dish()
	if _, fault := r.WallTemperature(25e3); fault != TooCold {
		t.Errorf("more heat than light: %v", fault)
	}
	if _, fault := r.WallTemperature(math.NaN()); fault != BadNumber {
		t.Errorf("heat not a number: %v", fault)
	}
}
