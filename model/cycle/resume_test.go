package cycle

import (
	"math"
	"testing"

	"hotfront/model/correlation"
)

// hotter moves the hot end.
func hotter(p *Path, by float64) {
	for i := range p.N {
		if p.Cells[i].Kind == Tube && p.Cells[i].Part == PartHeater {
			p.Cells[i].Outer += by
			p.Cells[i].Wall += by
		}
	}
}

// TestResume: going on from the solution at another hot end ends where a start from rest does, in a fifth fewer
// steps on the whole. Both stop within the tolerances of the periodic state, 2e-4 of the heat each.
func TestResume(t *testing.T) {
	fast := correlation.NewFast()
	resumed, fresh := NewSolver(fast), NewSolver(fast)
	resumedSteps, freshSteps := 0, 0
	for _, m := range machines() {
		for _, by := range []float64{-150, -20, 5, 80} {
			var got, want Result
			p := m.path(production())
			resumed.Solve(&got, p, DefaultSettings())
			hotter(p, by)
			resumed.Resume(&got, p, DefaultSettings())
			fresh.Solve(&want, p, DefaultSettings())
			if !got.Converged || !want.Converged {
				t.Fatalf("%s %+g K: not settled", m.name, by)
			}
			gw, ww := got.WorkExpansion+got.WorkCompression, want.WorkExpansion+want.WorkCompression
			gh, wh := 0.0, 0.0
			for i := range p.N {
				if p.Cells[i].Part == PartHeater {
					gh, wh = gh+got.Heat[i], wh+want.Heat[i]
				}
			}
			if math.Abs(gw-ww) > 1e-3*wh || math.Abs(gh-wh) > 1e-3*wh {
				t.Errorf("%s %+g K: work %.4f J, heat %.4f J; from rest %.4f, %.4f", m.name, by, gw, gh, ww, wh)
			}
			resumedSteps, freshSteps = resumedSteps+got.Steps, freshSteps+want.Steps
			t.Logf("%-16s %+4g K: %2d cycles, %4d steps; from rest %2d, %4d", m.name, by, got.Cycles, got.Steps, want.Cycles, want.Steps)
		}
	}
	if resumedSteps*5 > freshSteps*4 {
		t.Errorf("%d steps, from rest %d", resumedSteps, freshSteps)
	}
}
