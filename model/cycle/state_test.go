package cycle

import (
	"testing"

	"hotfront/model/correlation"
)

// TestSolverKeepsNothing shows that a solver has no memory: after other machines, and after one that
// fails, a machine gives the same result to the last bit as in a new solver.
func TestSolverKeepsNothing(t *testing.T) {
	fast := correlation.NewFast()
	used := NewSolver(fast)
	all := machines()
	hopeless := all[0]
	hopeless.hot, hopeless.cold, hopeless.freq = 2990, 205, 400
	for i := range all {
		for j := range all {
			for _, before := range []*machine{&all[j], &hopeless} {
				var r Result
				used.Solve(&r, before.path(grid{3 + i, 8 + j, 5, 40, 12}), Settings{MaxCycles: 9, Newton: 1, Depth: 3})
			}
			p := all[i].path(production())
			var got, want Result
			used.Solve(&got, p, DefaultSettings())
			NewSolver(fast).Solve(&want, p, DefaultSettings())
			if got != want {
				t.Errorf("%s after %s differs from a new solver's: work %v and %v", all[i].name, all[j].name, got.WorkExpansion, want.WorkExpansion)
			}
		}
	}
}

// TestSolveAllocs: solving allocates nothing.
func TestSolveAllocs(t *testing.T) {
	m := machines()[0]
	p := m.path(production())
	s := NewSolver(correlation.NewFast())
	var r Result
	if n := testing.AllocsPerRun(5, func() { s.Solve(&r, p, DefaultSettings()) }); n != 0 {
		t.Errorf("%v allocations a solution", n)
	}
}
