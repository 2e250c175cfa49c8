package gas

import "testing"

// BenchmarkAt is to stay below 15 ns, BenchmarkTransport below 10 ns.
func BenchmarkAt(b *testing.B) {
	g := New(Hydrogen)
	var s State
	var sum float64
	T := 300.0
	for b.Loop() {
		g.At(&s, T, 50e5)
		sum += s.H
		T += 1e-3
	}
	if sum == 0 {
		b.Fatal("no enthalpy")
	}
	b.ReportAllocs()
}

func BenchmarkTransport(b *testing.B) {
	g := New(Hydrogen)
	var sum float64
	T := 300.0
	for b.Loop() {
		mu, k := g.Transport(T, 5)
		sum += mu + k
		T += 1e-3
	}
	if sum == 0 {
		b.Fatal("no viscosity")
	}
	b.ReportAllocs()
}
