package cycle

import (
	"math"
	"testing"

	"hotfront/model/correlation"
)

// through takes the solver from a state through a cycle and what is done after it, and returns the state then. Changes are
// followed in steps of stride time steps, when it is not 0.
func (s *Solver) through(x *[maxStates]float64, stride int) (out [maxStates]float64) {
	s.unpack(x)
	s.transport(false)
	s.conserved()
	if stride > 0 {
		s.tangent.begin(s)
		s.tangent.stride = stride
	}
	s.newton = 1
	if !s.run() {
		panic("left the physical range")
	}
	mean := s.sums.pressure / s.path.Period
	if s.tangent.follow {
		s.tangent.end(s)
	}
	s.moveWalls()
	s.p *= s.path.Mean / mean
	s.pack(&out)
	return out
}

// TestSlopes holds the slopes that changes followed through a cycle give against differences of whole cycles, for the
// measures that Newton's step is taken in. What counts is the system 1 - slopes: its matrix part is small, and is held to
// its own diagonal. On short steps what is left is the slope of the gas inside a tube cell and, for the pressure, that of
// the films; long steps, as in production, are good to a third of the diagonal.
func TestSlopes(t *testing.T) {
	fast := correlation.NewFast()
	for _, m := range machines() {
		for _, asked := range []bool{false, true} { // a mean gas temperature asked for: one column more
			p := m.path(grid{6, 12, 6, 240, 240})
			if asked {
				p.Target = m.hot - 60
			}
			for i := range p.N {
				if p.Cells[i].Kind == Tube {
					p.Cells[i].Resistance = 0.01
				}
			}
			s := NewSolver(fast)
			var r Result
			s.Solve(&r, p, Settings{MaxCycles: 3, Newton: 1}) // three plain cycles
			s.move = &p.Coarse
			base := *s
			var x, y [maxStates]float64
			s.pack(&x)
			at := s.through(&x, 1)
			g := &s.tangent
			k := g.columns
			if want := map[bool]int{false: 17, true: 18}[asked]; k != want {
				t.Fatalf("%s: %d columns, want %d", m.name, k, want)
			}
			worst, worstMatrix, films := 0.0, 0.0, 0.0
			for c := range k {
				const d = 1e-3
				y = x
				switch cell := g.cells[c]; g.kinds[c] {
				case columnMatrix:
					y[cell] += d / temperatureScale
					y[s.n+cell] += d / temperatureScale
				case columnSpace:
					y[cell] += d / temperatureScale
				case columnPressure:
					y[2*s.n] += d
				case columnLift:
					y[2*s.n+1] += d / temperatureScale
				default:
					for i := range s.n {
						if s.tubeOf(i) == g.kinds[c] {
							y[s.n+i] += d / temperatureScale
						}
					}
				}
				other := base
				got := other.through(&y, 0)
				var slope [maxStates]float64
				for i := range slope {
					slope[i] = (got[i] - at[i]) / d
				}
				for r := range k {
					off := math.Abs(g.measure(s, r, &g.slopes[c]) - g.measure(s, r, &slope))
					if g.kinds[c] == columnPressure && g.kinds[r] != columnPressure {
						off /= temperatureScale
					} else if g.kinds[r] == columnPressure && g.kinds[c] != columnPressure {
						off *= temperatureScale
					}
					if g.kinds[c] == columnPressure {
						films = max(films, off)
						continue
					}
					worst = max(worst, off)
					if g.kinds[r] == columnMatrix && g.kinds[c] == columnMatrix {
						worstMatrix = max(worstMatrix, off/(1-g.measure(s, r, &g.slopes[r])))
					}
				}
			}
			t.Logf("%-16s %d columns: slopes within %.3f, by the pressure %.3f, of the matrix within %.3f of its diagonal", m.name, k, worst, films, worstMatrix)
			if worst > 0.1 || worstMatrix > 0.05 || films > 0.5 {
				t.Errorf("%s: slopes off by %.3f, by the pressure %.3f, of the matrix by %.3f of its diagonal", m.name, worst, films, worstMatrix)
			}
		}
	}
}

// TestSlopesSaveCycles counts what the slopes are for.
func TestSlopesSaveCycles(t *testing.T) {
	s := NewSolver(correlation.NewFast())
	plain := DefaultSettings()
	plain.Slopes = false
	with, without := 0, 0
	for _, m := range machines() {
		var a, b Result
		p := m.path(production())
		s.Solve(&a, p, DefaultSettings())
		s.Solve(&b, p, plain)
		if !a.Converged || !b.Converged {
			t.Fatalf("%s: not settled", m.name)
		}
		wa, wb := a.WorkExpansion+a.WorkCompression, b.WorkExpansion+b.WorkCompression
		if math.Abs(wa-wb) > 2e-3*math.Abs(wb) {
			t.Errorf("%s: work %.5f J, without slopes %.5f", m.name, wa, wb)
		}
		with, without = with+a.Steps, without+b.Steps
		t.Logf("%-16s %d + %d cycles, without slopes %d + %d", m.name, a.Cycles-a.FineCycles, a.FineCycles, b.Cycles-b.FineCycles, b.FineCycles)
	}
	if with*4 > without*3 {
		t.Errorf("%d steps, without slopes %d: a quarter less was won when this was written", with, without)
	}
}
