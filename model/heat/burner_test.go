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

func prepare(t testing.TB, b *Burner) {
	t.Helper()
	if fault := b.Prepare(); fault != OK {
		t.Fatal(fault)
	}
}

func solve(t testing.TB, b *Burner, power, Tw float64) Balance {
	t.Helper()
	var d Balance
	if fault := Solve(&d, b, power, Tw); fault != OK {
		t.Fatalf("%g W, %g K: %v", power, Tw, fault)
	}
	return d
}

// TestBurnerLimits: closed forms.
func TestBurnerLimits(t *testing.T) {
	const power, Tw = 15e3, 1000.0
	// Nothing but convection: the gas enters at the adiabatic flame temperature.
	b := sample()
	b.FlameEmissivity, b.CasingShare, b.PreheaterEffectiveness = 0, 0, 0
	prepare(t, &b)
	d := solve(t, &b, power, Tw)
	flame, _ := b.Combustion().FlameTemperature(b.Ambient, b.Ambient)
	if !(math.Abs(d.GasTemperature/flame-1) < 1e-11) || !(math.Abs(d.FlameTemperature/flame-1) < 1e-11) || d.Radiation != 0 || d.Casing != 0 || d.Preheat != 0 {
		t.Errorf("gas at %g K, flame %g K: %+v", d.GasTemperature, flame, d)
	}
	// The bank as a march in small steps with the heat capacity at each place, its film held: the mean heat capacity and
	// the exponential stand for this.
	c, T := b.Combustion(), d.GasTemperature
	const steps = 10000
	for range steps {
		T -= d.Conductance / steps * (T - Tw) / (d.FuelFlow * c.GasCp(T))
	}
	if !(math.Abs((T-Tw)/(d.BankExit-Tw)-1) < 0.02) {
		t.Errorf("behind the bank %g K, by the march %g K", d.BankExit, T)
	}

	// A very long bank: the gas leaves at the temperature of the tubes.
	b.Bank.Length, b.Bank.FlowArea = 50, 0.016
	prepare(t, &b)
	d = solve(t, &b, power, Tw)
	want := 1 - (c.GasEnthalpy(Tw)-c.AirEnthalpy(b.Ambient)-c.FuelEnthalpy(b.Ambient))/c.LowerHeating
	if !(math.Abs(d.BankExit-Tw) < 1e-6) || !(math.Abs(d.Efficiency/want-1) < 1e-9) {
		t.Errorf("long bank: exit %g K, efficiency %g, want %g", d.BankExit, d.Efficiency, want)
	}
	// With a perfect preheater: what is left is that flue gas holds more heat than air.
	b.PreheaterEffectiveness = 1
	prepare(t, &b)
	d = solve(t, &b, power, Tw)
	want = 1 - (c.GasEnthalpy(Tw)-c.AirEnthalpy(Tw)-c.FuelEnthalpy(b.Ambient))/c.LowerHeating
	if !(math.Abs(d.AirTemperature-Tw) < 1e-6) || !(math.Abs(d.Efficiency/want-1) < 1e-9) {
		t.Errorf("perfect preheater: air %g K, efficiency %g, want %g", d.AirTemperature, d.Efficiency, want)
	}
	// Radiation alone matters where the bank is hardly there: stirred chamber, losses to the tubes by the fourth power.
	b = sample()
	b.Bank.TransversePitch, b.Bank.Length, b.Bank.Rows, b.PreheaterEffectiveness, b.CasingShare = 9e-3, 0.01, 1, 0, 0
	b.RadiantArea = 0.05
	prepare(t, &b)
	d = solve(t, &b, power, Tw)
	e, _ := EffectiveEmissivity(0.2, 0.8)
	if want := e * stefanBoltzmann * 0.05 * (math.Pow(d.GasTemperature, 4) - math.Pow(Tw, 4)); !(math.Abs(d.Radiation/want-1) < 1e-12) || !(d.Radiation > 5*d.Convection) {
		t.Errorf("radiation %g W, want %g W, convection %g W", d.Radiation, want, d.Convection)
	}
	// Casing: share and conductance.
	b.CasingShare, b.CasingConductance = 0.1, 0.5
	prepare(t, &b)
	d = solve(t, &b, power, Tw)
	if want := 0.1*power + 0.5*(d.GasTemperature-b.Ambient); !(math.Abs(d.Casing/want-1) < 1e-12) {
		t.Errorf("casing %g W, want %g W", d.Casing, want)
	}
}

// TestBurnerPreheater: with a conductance the heat is UA times the logarithmic mean of the two end differences, to what
// the variable heat capacity allows; the effectiveness given gives the same burner as its own conductance.
func TestBurnerPreheater(t *testing.T) {
	b := sample()
	b.PreheaterEffectiveness, b.PreheaterConductance = 0, 12
	prepare(t, &b)
	d := solve(t, &b, 15e3, 1000)
	hot, cold := d.BankExit-d.AirTemperature, d.FlueTemperature-b.Ambient
	if want := 12 * (hot - cold) / math.Log(hot/cold); !(math.Abs(d.Preheat/want-1) < 0.03) {
		t.Errorf("preheat %g W, UA times logarithmic mean difference %g W", d.Preheat, want)
	}
	c := b.Combustion()
	e := (c.AirEnthalpy(d.AirTemperature) - c.AirEnthalpy(b.Ambient)) / (c.AirEnthalpy(d.BankExit) - c.AirEnthalpy(b.Ambient))
	b.PreheaterEffectiveness, b.PreheaterConductance = e, 0
	prepare(t, &b)
	d2 := solve(t, &b, 15e3, 1000)
	if !(math.Abs(d2.Heat/d.Heat-1) < 1e-9) || !(math.Abs(d2.PreheaterNTU/d.PreheaterNTU-1) < 1e-7) {
		t.Errorf("by effectiveness %g W and %g units, by conductance %g W and %g units", d2.Heat, d2.PreheaterNTU, d.Heat, d.PreheaterNTU)
	}
}

// TestBurnerFaults: each way to fail has its cause.
func TestBurnerFaults(t *testing.T) {
	nan := math.NaN()
	for _, c := range []struct {
		name   string
		change func(b *Burner)
		want   Fault
	}{
		{"good", func(b *Burner) {}, OK},
		{"rich", func(b *Burner) { b.ExcessAir = 0.9 }, TooLittleAir},
		{"two preheaters", func(b *Burner) { b.PreheaterConductance = 1 }, BadShare},
		{"effectiveness above 1", func(b *Burner) { b.PreheaterEffectiveness = 1.1 }, BadShare},
		{"negative conductance", func(b *Burner) { b.CasingConductance = -1 }, BadNumber},
		{"casing not a number", func(b *Burner) { b.CasingShare = nan }, BadShare},
		{"hot day", func(b *Burner) { b.Ambient = 500 }, TemperatureRange},
		{"emissivity", func(b *Burner) { b.WallEmissivity = 1.2 }, BadShare},
		{"radiant area", func(b *Burner) { b.RadiantArea = nan }, BadNumber},
		{"bank", func(b *Burner) { b.Bank.Rows = 0 }, BankImpossible},
		{"no fuel", func(b *Burner) { b.Fuel = Fuel{} }, SharesNotOne},
	} {
		b := sample()
		c.change(&b)
		if got := b.Prepare(); got != c.want {
			t.Errorf("%s: %q, want %q", c.name, got, c.want)
		}
	}
	b := sample()
	prepare(t, &b)
	weak := sample()
	weak.CasingConductance = 1e9
	prepare(t, &weak)
	finned := sample()
	finned.Bank.Fins = Fins{Kind: AnnularFins, Height: 1.3e-3, Thickness: 1e-5, Pitch: 1e-3, Conductivity: 1}
	prepare(t, &finned)
	var d Balance
	for _, c := range []struct {
		name      string
		got, want Fault
	}{
		{"no power", Solve(&d, &b, 0, 1000), BadNumber},
		{"power not a number", Solve(&d, &b, nan, 1000), BadNumber},
		{"cold tubes", Solve(&d, &b, 1e4, 299), TemperatureRange},
		{"tubes not a number", Solve(&d, &b, 1e4, nan), TemperatureRange},
		{"trickle", Solve(&d, &b, 1, 1000), ReynoldsRange},
		{"torrent", Solve(&d, &b, 1e10, 1000), ReynoldsRange},
		{"no heat left", Solve(&d, &weak, 1e4, 400), TooCold},
		{"bad fins", Solve(&d, &finned, 1e4, 1000), FinRange},
		{"no heat wanted", FuelFor(&d, &b, 0, 1000), BadNumber},
		{"heat not a number", FuelFor(&d, &b, nan, 1000), BadNumber},
		{"more heat than the bank's law reaches", FuelFor(&d, &b, 1e10, 1000), ReynoldsRange},
		{"less heat than the bank's law reaches", FuelFor(&d, &b, 1, 400), ReynoldsRange},
		{"no heat at all", FuelFor(&d, &weak, 1e3, 400), TooCold},
	} {
		if c.got != c.want {
			t.Errorf("%s: %q, want %q", c.name, c.got, c.want)
		}
	}
	lean := sample()
	lean.ExcessAir, lean.PreheaterEffectiveness = 5, 0
	prepare(t, &lean)
	if got := FuelFor(&d, &lean, 1e3, 1500); got != TooCold {
		t.Errorf("flame colder than the tubes: %q", got)
	}
	defer func() {
		if recover() == nil {
			t.Error("no panic for a burner that was not prepared")
		}
	}()
	raw := sample()
	_ = Solve(&d, &raw, 1e4, 1000)
}

// TestBurnerTrends: what every handbook says.
func TestBurnerTrends(t *testing.T) {
	at := func(change func(b *Burner)) Balance {
		b := sample()
		change(&b)
		prepare(t, &b)
		return solve(t, &b, 15e3, 1000)
	}
	base := at(func(b *Burner) {})
	if d := at(func(b *Burner) { b.ExcessAir = 1.8 }); !(d.FlameTemperature < base.FlameTemperature && d.Efficiency < base.Efficiency) {
		t.Errorf("more air: flame %g K, efficiency %g; before %g K, %g", d.FlameTemperature, d.Efficiency, base.FlameTemperature, base.Efficiency)
	}
	if d := at(func(b *Burner) { b.PreheaterEffectiveness = 0 }); !(d.Efficiency < base.Efficiency-0.15) {
		t.Errorf("without preheater: efficiency %g, with it %g", d.Efficiency, base.Efficiency)
	}
	fins := Fins{Kind: AnnularFins, Height: 1.5e-3, Thickness: 0.3e-3, Pitch: 1.2e-3, Conductivity: 25}
	if d := at(func(b *Burner) { b.Bank.Fins = fins }); !(d.Conductance > 1.3*base.Conductance && d.Efficiency > base.Efficiency && d.FinEfficiency < 1) {
		t.Errorf("fins: %g W/K, efficiency %g; without %g W/K, %g", d.Conductance, d.Efficiency, base.Conductance, base.Efficiency)
	}
	if !base.Dissociating || at(func(b *Burner) { b.ExcessAir, b.PreheaterEffectiveness = 1.5, 0 }).Dissociating {
		t.Error("dissociation marked wrongly")
	}
}

// TestDewPoint: flue gas of methane and stoichiometric air has its dew point at 59 degC (textbooks, from memory), pure water
// vapour boils at 100 degC, and cold flue gas is marked.
func TestDewPoint(t *testing.T) {
	c := burn(t, Methane, 1)
	if got := c.DewPoint() - 273.15; !(math.Abs(got-59) < 1) {
		t.Errorf("methane: %g degC", got)
	}
	if got := dewPoint(atmosphere) - 273.15; !(math.Abs(got-100) < 0.8) {
		t.Errorf("pure water: %g degC", got)
	}
	if got := dewPoint(0); got != 0 {
		t.Errorf("dry gas: %g K", got)
	}
	b := sample()
	b.Fuel, b.PreheaterEffectiveness = NewFuel(Hydrogen), 0
	prepare(t, &b)
	if d := solve(t, &b, 1000, 305); !d.Condensing {
		t.Errorf("flue gas at %g K, dew point %g K, not marked", d.FlueTemperature, b.Combustion().DewPoint())
	}
	if d := solve(t, &b, 5e3, 900); d.Condensing {
		t.Errorf("flue gas at %g K marked as condensing", d.FlueTemperature)
	}
}

func TestAllocs(t *testing.T) {
	b := sample()
	prepare(t, &b)
	r := dish()
	var d Balance
	var e ReceiverBalance
	if n := testing.AllocsPerRun(20, func() {
		Solve(&d, &b, 15e3, 1000)
		FuelFor(&d, &b, 10e3, 1000)
		b.Heat(15e3, 1000)
		r.Solve(&e, 1000)
		r.Stagnation()
		b.Prepare()
	}); n != 0 {
		t.Errorf("%g allocations", n)
	}
}

// randomBurner draws a burner, often near the ends of what is allowed.
func randomBurner(r *rand.Rand) Burner {
	b := Burner{
		Fuel:      NewFuel(FuelKind(r.IntN(int(GivenFuel)))),
		ExcessAir: 1 + 2*r.Float64()*r.Float64(), Ambient: 250 + 100*r.Float64(),
		CasingShare: 0.2 * r.Float64(),
		Bank: Bank{
			Arrangement: Arrangement(r.IntN(2)), Rows: 1 + r.IntN(5), TubesPerRow: float64(5 + r.IntN(60)), Diameter: 2e-3 + 1e-2*r.Float64(),
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

// TestBurnerRandom: over 2000 random burners the ledger closes to 1e-9, the heat falls with the wall temperature, the
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
		var d, hot, more, back Balance
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
		if i%10 == 0 {
			Q, slope, fault := b.Heat(power, Tw)
			if Solve(&hot, &b, power, Tw+1) == OK && (fault != OK || !(math.Abs((hot.Heat-Q)/slope-1) < 0.02)) {
				t.Errorf("burner %d: slope %g W/K, difference %g W/K %v", i, slope, hot.Heat-Q, fault)
			}
		}
		if !(d.Heat > 1e-3*power) {
			continue
		}
		if fault := FuelFor(&back, &b, d.Heat, Tw); fault != OK || !(math.Abs(back.Heat/d.Heat-1) < 1e-11) {
			t.Errorf("burner %d: fuel for %g W gives %g W: %v", i, d.Heat, back.Heat, fault)
			continue
		}
		if b.PreheaterConductance > 0 {
			continue // the heat need not rise with the fuel, as FuelFor says
		}
		if Solve(&more, &b, power*1.01, Tw) == OK && !(more.Heat > d.Heat) {
			t.Errorf("burner %d: heat does not rise with the fuel: %g to %g W", i, d.Heat, more.Heat)
		}
		e = math.Abs(back.FuelPower/power - 1)
		worstFuel = max(worstFuel, e)
		if !(e < 1e-8) {
			t.Errorf("burner %d: fuel %g W, want %g W", i, back.FuelPower, power)
		}
	}
	t.Logf("%d solved, ledger within %.1e, fuel within %.1e, faults %v", solved, worst, worstFuel, faults)
	if solved < 1500 {
		t.Errorf("only %d solved: %v", solved, faults)
	}
}
