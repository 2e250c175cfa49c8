package heat

import (
	"math"
	"math/rand/v2"
	"testing"
)

// sample is an invented burner of some 15 kW for tests.
func sample() Burner {
	return Burner{
		Fuel: NewFuel(Propane), ExcessAir: 1.3, PreheaterEffectiveness: 0.75, Ambient: 298.15, CasingShare: 0.02,
		Bank: Bank{
			Arrangement: Staggered, Rows: 2, TubesPerRow: 20, Diameter: 5e-3, TransversePitch: 9e-3, LongitudinalPitch: 9e-3,
			Length: 0.2, Fins: Fins{},
		},
		FlameEmissivity: 0.2, WallEmissivity: 0.8,
	}
}

func TestBurnerSample(t *testing.T) {
	b := sample()
	if fault := b.Prepare(); fault != OK {
		t.Fatal(fault)
	}
	var d Balance
	if fault := Solve(&d, &b, 15e3, 1000); fault != OK {
		t.Fatal(fault)
	}
	t.Logf("%+v", d)
}

// randomBurner draws a burner, often near the ends of what is allowed.
func randomBurner(r *rand.Rand) Burner {
	b := Burner{
		Fuel:      NewFuel(FuelKind(r.IntN(int(GivenFuel)))),
		ExcessAir: 1 + 2*r.Float64()*r.Float64(), Ambient: 250 + 100*r.Float64(),
		CasingShare: 0.2 * r.Float64(),
		Bank: Bank{
			Arrangement: Arrangement(r.IntN(2)), Rows: 1 + r.IntN(5), TubesPerRow: 5 + r.IntN(60), Diameter: 2e-3 + 1e-2*r.Float64(),
			Length: 0.02 + 0.5*r.Float64(),
		},
		FlameEmissivity: r.Float64(), WallEmissivity: r.Float64(),
	}
	b.Bank.TransversePitch = b.Bank.Diameter * (1.2 + 2*r.Float64())
	b.Bank.LongitudinalPitch = b.Bank.Diameter * (1.2 + 0.4*r.Float64())
	switch r.IntN(4) {
	case 0:
		b.PreheaterEffectiveness = 1
	case 1:
		b.PreheaterEffectiveness = r.Float64()
	case 2:
		b.PreheaterConductance = math.Exp(8 * r.Float64())
	}
	if r.IntN(2) == 0 {
		b.CasingConductance = 10 * r.Float64()
	}
	if r.IntN(2) == 0 {
		b.RadiantArea = 0.2 * r.Float64()
	}
	gap := min(b.Bank.TransversePitch, b.Bank.LongitudinalPitch) - b.Bank.Diameter
	switch r.IntN(3) {
	case 0:
		b.Bank.Fins = Fins{Kind: AnnularFins, Height: 0.4 * gap, Thickness: 3e-4, Pitch: 1e-3 + 3e-3*r.Float64(), Conductivity: 25}
	case 1:
		b.Bank.Fins = Fins{Kind: LongitudinalFins, Height: 0.4 * gap, Thickness: 3e-4, Count: 1 + r.IntN(10), Conductivity: 25}
	}
	return b
}

// TestBurnerRandom: over random burners the ledger closes to 1e-9, the heat falls with the wall temperature, the
// temperatures keep their order, the slope agrees with differences, and FuelFor finds the fuel that Solve was given.
func TestBurnerRandom(t *testing.T) {
	r := rand.New(rand.NewPCG(3, 7))
	solved, faults := 0, map[Fault]int{}
	worst, worstFuel := 0.0, 0.0
	for i := range 2000 {
		b := randomBurner(r)
		if fault := b.Prepare(); fault != OK {
			faults[fault]++
			continue
		}
		power, Tw := math.Exp(5+7*r.Float64()), 350+1000*r.Float64()
		var d, hot, more Balance
		if fault := Solve(&d, &b, power, Tw); fault != OK {
			faults[fault]++
			continue
		}
		solved++
		e := math.Abs(d.FuelPower-d.Heat-d.Casing-d.Chimney) / power
		worst = max(worst, e)
		if !(e < 1e-9) {
			t.Errorf("burner %d: ledger open by %g", i, e)
		}
		if e := math.Abs(d.Heat-d.Convection-d.Radiation) / power; !(e < 1e-12) {
			t.Errorf("burner %d: parts of the heat off by %g", i, e)
		}
		if !(d.GasTemperature <= d.FlameTemperature+1e-6) || Tw < d.GasTemperature && !(d.BankExit >= Tw-1e-9 && d.BankExit <= d.GasTemperature+1e-9) {
			t.Errorf("burner %d: temperatures out of order: flame %g, gas %g, exit %g, wall %g K", i, d.FlameTemperature, d.GasTemperature, d.BankExit, Tw)
		}
		if d.BankExit > b.Ambient && !(d.AirTemperature <= d.BankExit+1e-6 && d.FlueTemperature >= b.Ambient-1e-6 && d.Preheat >= 0) {
			t.Errorf("burner %d: preheater against the second law: air %g, exit %g, flue %g K", i, d.AirTemperature, d.BankExit, d.FlueTemperature)
		}
		if fault := Solve(&hot, &b, power, Tw+20); fault == OK && !(hot.Heat < d.Heat) {
			t.Errorf("burner %d: heat rises with the wall temperature: %g to %g W", i, d.Heat, hot.Heat)
		}
		if fault := Solve(&more, &b, power*1.01, Tw); fault == OK && d.Heat > 0 && b.PreheaterConductance == 0 {
			if !(more.Heat > d.Heat) {
				t.Errorf("burner %d: heat does not rise with the fuel: %g to %g W", i, d.Heat, more.Heat)
			}
		}
		if d.Heat > 1e-3*power {
			var back Balance
			if fault := FuelFor(&back, &b, d.Heat, Tw); fault != OK {
				t.Errorf("burner %d: fuel for %g W: %v (%+v)", i, d.Heat, fault, d)
			} else {
				if e := math.Abs(back.Heat/d.Heat - 1); !(e < 1e-11) {
					t.Errorf("burner %d: fuel for %g W gives %g W", i, d.Heat, back.Heat)
				}
				if b.PreheaterConductance > 0 {
					continue // the heat may be had with more than one fuel power
				}
				e := math.Abs(back.FuelPower/power - 1)
				worstFuel = max(worstFuel, e)
				if !(e < 1e-8) {
					t.Errorf("burner %d: fuel %g W, want %g W", i, back.FuelPower, power)
				}
			}
		}
		if i%10 == 0 {
			Q, slope, fault := b.Heat(power, Tw)
			var up Balance
			if up2 := Solve(&up, &b, power, Tw+1); fault != OK || up2 == OK && !(math.Abs((up.Heat-Q)/slope-1) < 0.02) {
				t.Errorf("burner %d: slope %g W/K, difference %g W/K %v", i, slope, up.Heat-Q, fault)
			}
		}
	}
	t.Logf("%d solved, ledger within %.1e, fuel within %.1e, faults %v", solved, worst, worstFuel, faults)
	if solved < 1500 {
		t.Errorf("only %d solved: %v", solved, faults)
	}
}
