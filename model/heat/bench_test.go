package heat

import "testing"

// BenchmarkGasEnthalpy is to stay below 20 ns, BenchmarkGasTemperature below 500 ns.
func BenchmarkGasEnthalpy(b *testing.B) {
	f := NewFuel(Propane)
	var c Combustion
	c.Set(&f, 1.3)
	T, sum := 300.0, 0.0
	for b.Loop() {
		sum += c.GasEnthalpy(T)
		T += 1e-6
	}
	if sum == 0 {
		b.Fatal("no enthalpy")
	}
	b.ReportAllocs()
}

func BenchmarkGasTemperature(b *testing.B) {
	f := NewFuel(Propane)
	var c Combustion
	c.Set(&f, 1.3)
	h := c.GasEnthalpy(1700)
	for b.Loop() {
		if _, fault := c.GasTemperature(h); fault != OK {
			b.Fatal(fault)
		}
		h++
	}
	b.ReportAllocs()
}

// BenchmarkSolve is to stay below 15 us, BenchmarkFuelFor below 150 us.
func BenchmarkSolve(b *testing.B) {
	burner := sample()
	prepare(b, &burner)
	var d Balance
	for b.Loop() {
		if fault := Solve(&d, &burner, 15e3, 1000); fault != OK {
			b.Fatal(fault)
		}
	}
	b.ReportAllocs()
}

func BenchmarkFuelFor(b *testing.B) {
	burner := sample()
	prepare(b, &burner)
	var d Balance
	for b.Loop() {
		if fault := FuelFor(&d, &burner, 11e3, 1000); fault != OK {
			b.Fatal(fault)
		}
	}
	b.ReportAllocs()
}

func BenchmarkPrepare(b *testing.B) {
	burner := sample()
	for b.Loop() {
		prepare(b, &burner)
	}
	b.ReportAllocs()
}
