package cycle

import (
	"fmt"
	"testing"

	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// TestSimilarity scales a machine by a factor x in every length, wires and bores too, in a perfect gas
// of constant viscosity and conductivity, at the same temperatures. Then
//
//	Mach      u/a                    u the same, so frequency ~ 1/x
//	Reynolds  rho u d/mu             rho ~ 1/x, so pressure ~ 1/x
//	NTU       h A/(M cp)             h ~ k/d ~ 1/x, A ~ x^2, M ~ rho u A ~ x: the same
//	Stanton of the metal             gas of a blow ~ rho x^3 ~ x^2 against metal x^3: needs rho c of the metal ~ 1/x
//	axial conduction over M cp       k A/L ~ x: the same
//
// and work ~ p x^3 ~ x^2, heat likewise, power ~ x, every temperature and pressure ratio the same. The
// discrete equations have the same symmetry, so the agreement must be far better than the 0.5 % that a
// measurement would allow.
func TestSimilarity(t *testing.T) {
	base := machines()[0]
	base.gas = gas.Perfect(2077.265, 5.0/3, 3.3e-5, 0.26)
	base.conduct = 2
	solve := func(x float64) (Result, *Path) {
		m := base
		for _, length := range []*float64{&m.boreH, &m.lengthH, &m.boreK, &m.lengthK, &m.length, &m.wire} {
			*length *= x
		}
		m.area *= x * x
		for _, volume := range []*float64{&m.sweptE, &m.sweptC, &m.clearE, &m.clearC} {
			*volume *= x * x * x
		}
		m.freq /= x
		m.mean /= x
		m.rhoC /= x
		p := m.path(production())
		var r Result
		NewSolver(correlation.NewFast()).Solve(&r, p, DefaultSettings())
		if !r.Converged {
			t.Fatalf("scale %g: not converged", x)
		}
		return r, p
	}
	one, path := solve(1)
	for _, x := range []float64{0.3, 0.8, 1.7, 5} {
		r, p := solve(x)
		at := fmt.Sprintf("scale %g, ", x)
		const same = 1e-5 // rounding, drawn out by the iteration
		near(t, at+"work", (r.WorkExpansion+r.WorkCompression)/(x*x), one.WorkExpansion+one.WorkCompression, same)
		near(t, at+"heater heat", heat(&r, p, PartHeater)/(x*x), heat(&one, path, PartHeater), same)
		near(t, at+"cooler heat", heat(&r, p, PartCooler)/(x*x), heat(&one, path, PartCooler), same)
		near(t, at+"enthalpy through the matrix", r.Enthalpy[p.N/2]/(x*x), one.Enthalpy[p.N/2], 1e-3)
		near(t, at+"pressure ratio", r.PressureMax/r.PressureMin, one.PressureMax/one.PressureMin, same)
		near(t, at+"expansion temperature", r.Temperature[0], one.Temperature[0], same)
	}
}

// BenchmarkCycle is one search for the periodic state on the production grid: helium at 4 MPa.
// BenchmarkCycle compares the gas as it is, cp(T) and density with its virial, with one of constant properties; the time of a
// step is what the difference costs.
func BenchmarkCycle(b *testing.B) {
	m := machines()[0]
	for _, c := range []struct {
		name string
		gas  gas.Gas
	}{{"real", m.gas}, {"constant", gas.Perfect(2077, 5.0/3, 3.2e-5, 0.25)}} {
		b.Run(c.name, func(b *testing.B) {
			m.gas = c.gas
			p := m.path(production())
			s := NewSolver(correlation.NewFast())
			var r Result
			b.ReportAllocs()
			steps := 0
			for b.Loop() {
				s.Solve(&r, p, DefaultSettings())
				steps += r.Steps
			}
			if !r.Converged {
				b.Fatal("not converged")
			}
			b.ReportMetric(float64(b.Elapsed().Nanoseconds())/float64(steps), "ns/step")
		})
	}
}
