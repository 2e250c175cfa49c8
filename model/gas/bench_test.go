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

// BenchmarkIsobar is for 26 temperatures, as many as a gas path has cells; BenchmarkAt for one.
func BenchmarkIsobar(b *testing.B) {
	g := New(Hydrogen)
	var T, v, vT, vp, h, cp, hp [26]float64
	for i := range T {
		T[i] = 300 + 25*float64(i)
	}
	c := Columns{v[:], vT[:], vp[:], h[:], cp[:], hp[:]}
	var s Isobar
	p := 50e5
	b.ReportAllocs()
	for b.Loop() {
		s.Set(&g, p)
		s.At(&c, T[:])
		p += 1
	}
}
