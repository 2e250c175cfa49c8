package cycle

import (
	"math"
	"testing"

	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// TestEntropy draws up the entropy of a machine in a perfect gas, from the history of the cycle. The
// walls are fixed and the matrix is so heavy that it does not swing, so heat leaves the walls at constant
// temperatures. In a cell of temperature T, gas that enters at Tf makes the entropy
//
//	M cp ((Tf - T)/T - ln(Tf/T)) >= 0
//
// by mixing, gas that leaves at Tf (not at T: half a slope further on) takes as much away, and the film
// makes Q (1/T - 1/Tw) >= 0. Each part must make entropy, and all of it together must be what the walls
// lose over a cycle, so that the work lost against Carnot is Tk times that (Gouy and Stodola).
func TestEntropy(t *testing.T) {
	m := machines()[0]
	m.gas = gas.Perfect(2077.265, 5.0/3, 3.3e-5, 0.26)
	m.rhoC = 1e13
	p := m.path(grid{6, 12, 4, 240, 0})
	s := NewSolver(correlation.NewFast())
	var r Result
	s.Solve(&r, p, DefaultSettings())
	for i := range p.N { // hold every film at its mean, so that the history gives the heat
		if p.Cells[i].Kind == Tube || p.Cells[i].Kind == Matrix {
			p.Cells[i].FixedFilm = r.FilmMean[i]
		}
	}
	s.Solve(&r, p, DefaultSettings())
	if !r.Converged {
		t.Fatal("not converged")
	}
	wall := r.Wall // of the matrix: in the last cycle, before the last move of the profile
	for i := range p.N {
		if p.Cells[i].Kind == Matrix {
			wall[i] = s.sums.metal[i] / p.Period
		}
	}
	var made [Parts]float64
	lost := 0.0
	cp := m.gas.A0
	for k := range 2 * p.Fine.Steps {
		w := p.Period / float64(p.Fine.Steps) * Gamma
		if k&1 == 0 {
			w = p.Period / float64(p.Fine.Steps) * (1 - Gamma)
		}
		copy(s.t[:s.n], s.Trace.Temp[k][:s.n])
		copy(s.flow[:s.n], s.Trace.Flow[k][:s.n])
		s.volume[0], s.volume[s.n-1] = p.Fine.Ve[k], p.Fine.Vc[k]
		s.properties(s.Trace.Pressure[k])
		s.faces()
		mix := func(tf, t float64) float64 { return cp * ((tf-t)/t - math.Log(tf/t)) }
		for i := range s.n {
			ti := s.t[i]
			part := p.Cells[i].Part
			if i > 0 {
				made[part] += w * s.flow[i-1] * mix((s.hFace[i-1]-m.gas.H0)/cp, ti)
			}
			if i < s.n-1 {
				made[part] -= w * s.flow[i] * mix((s.hFace[i]-m.gas.H0)/cp, ti)
			}
			if film := p.Cells[i].FixedFilm; film > 0 {
				q := film * (wall[i] - ti)
				made[part] += w * q * (1/ti - 1/wall[i])
				lost -= w * q / wall[i]
			}
		}
	}
	sum := 0.0
	for part, v := range made {
		if Part(part) != PartDuct && !(v > 0) {
			t.Errorf("part %d makes the entropy %.3g J/K", part, v)
		}
		sum += v
	}
	near(t, "entropy made in the parts over entropy lost by the walls", sum, lost, 0.01)
	qh := heat(&r, p, PartHeater)
	conducted := 0.0 // heat that leaves the gas to the matrix at one place is conducted to another
	for i := range p.N {
		if p.Cells[i].Kind == Matrix {
			conducted += r.Heat[i] * (1 - m.cold/wall[i])
		}
	}
	carnot := qh*(1-m.cold/m.hot) + conducted
	near(t, "work lost over Tk times the entropy made", carnot-(r.WorkExpansion+r.WorkCompression), m.cold*sum, 0.01)
	t.Logf("entropy made: expansion space %.3f, heater %.3f, matrix %.3f, cooler %.3f, compression space %.3f J/K",
		made[PartExpansion], made[PartHeater], made[PartRegenerator], made[PartCooler], made[PartCompression])
}
