package cycle

import (
	"math"
	"testing"

	"hotfront/model/correlation"
)

// TestConservation shows that mass and energy are kept to rounding, whatever the Newton step leaves
// over: in one cycle from a state that is not yet periodic the gas keeps its mass, and what its
// internal energy and the heat of the matrix gain is what the walls gave less the work.
func TestConservation(t *testing.T) {
	s := NewSolver(correlation.NewFast())
	for _, m := range machines() {
		p := m.path(production())
		var r Result
		s.Solve(&r, p, DefaultSettings())
		s.p *= 1.2
		for i := range s.n {
			s.t[i] *= 1.03
		}
		s.conserved()
		total := func() (mass, energy float64) {
			for i := range s.n {
				mass += s.mass[i]
				energy += s.energy[i]
				if s.kind[i] == Matrix {
					energy += p.Cells[i].Capacity * s.wall[i]
				}
			}
			return mass, energy
		}
		mass0, energy0 := total()
		s.newton = 1
		if !s.run() {
			t.Fatalf("%s: diverged", m.name)
		}
		mass1, energy1 := total()
		given := s.wallHeat() - s.sums.work[0] - s.sums.work[1]
		hot := s.heatOf(PartHeater)
		if e := mass1/mass0 - 1; math.Abs(e) > 1e-12 {
			t.Errorf("%s: mass changes by %.1e in a cycle", m.name, e)
		}
		if e := (energy1 - energy0 - given) / hot; math.Abs(e) > 1e-9 {
			t.Errorf("%s: energy gained and energy given differ by %.1e of the heat", m.name, e)
		}
	}
}

// TestPeriodic looks at the state the solver accepts: it balances, keeps its mass from cycle to cycle
// when run on, and no section of the gas path gains.
func TestPeriodic(t *testing.T) {
	s := NewSolver(correlation.NewFast())
	for _, m := range machines() {
		p := m.path(production())
		var r Result
		s.Solve(&r, p, DefaultSettings())
		if !r.Converged || math.Abs(r.Balance) > tolBalance || r.Profile > tolProfile {
			t.Errorf("%s: converged %v, balance %.1e, profile %.1e", m.name, r.Converged, r.Balance, r.Profile)
		}
		near(t, m.name+", mean pressure", r.PressureMean, m.mean, tolPressure)
		first := r
		r = Result{}
		s.conserved()
		mass := 0.0
		for i := range s.n {
			mass += s.mass[i]
		}
		for range 5 { // plain cycles: nothing corrects the state but the physics
			s.conserved()
			if !s.run() {
				t.Fatalf("%s: diverged", m.name)
			}
		}
		s.collect(&r)
		near(t, m.name+", mass after five cycles", r.Mass, mass, 1e-9)
		near(t, m.name+", work after five cycles", r.WorkExpansion+r.WorkCompression, first.WorkExpansion+first.WorkCompression, 2e-3)
		near(t, m.name+", mean pressure after five cycles", r.PressureMean, m.mean, 1e-3)
	}
}
