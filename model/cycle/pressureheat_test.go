package cycle

import (
	"testing"

	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// TestPressureHeat explains why the net flow of enthalpy through the matrix falls below what the lag of
// the gas behind the metal carries, and may turn towards the hot end: work flows from the cold to the
// hot end of an engine's regenerator, so that the mass flow M towards the cold end and the swing p' of the
// pressure stand against each other, <M p'> < 0, and two things carry enthalpy in step with the pressure:
//
//	real gas      its enthalpy depends on pressure:                                 <M p'> dh/dp
//	light matrix  the metal takes up the heat of compression of the gas in its
//	              pores and warms by (T v_T/v) V p'/C; the gas that passes follows: <M p'> cp (T v_T/v) V/C
//
// Switched on alone, over a perfect gas in a heavy matrix, each must change the flow by that amount, to
// first order in the swings (15 and 25 % are allowed). Both move energy reversibly, so neither is a loss or a
// defect; the dynamic solver gives the same heats (TestDynamic).
func TestPressureHeat(t *testing.T) {
	solve := func(m machine) (rest, realGas, light float64) {
		p := m.path(grid{6, 12, 4, 120, 0})
		s := NewSolver(correlation.NewFast())
		var r Result
		s.Solve(&r, p, DefaultSettings())
		if !r.Converged {
			t.Fatalf("%s: not converged", m.name)
		}
		i := p.N / 2 // a face in the middle of the matrix
		lag := 0.5 * (r.Lag[i] + r.Lag[i+1]) * (r.Wall[i] - r.Wall[i+1])
		var st gas.State
		tm := 0.5 * (r.Temperature[i] + r.Temperature[i+1])
		m.gas.At(&st, tm, m.mean)
		sum := 0.0
		for k := range 2 * p.Fine.Steps {
			w := p.Period / float64(p.Fine.Steps) * Gamma
			if k&1 == 0 {
				w = p.Period / float64(p.Fine.Steps) * (1 - Gamma)
			}
			sum += w * s.Trace.Flow[k][i] * (s.Trace.Pressure[k] - r.PressureMean)
		}
		if sum >= 0 {
			t.Errorf("%s: mass flow and pressure in step, %.3g", m.name, sum)
		}
		return r.Enthalpy[i] - lag, sum * st.HP, sum * st.Cp * p.Cells[i].Volume / p.Cells[i].Capacity * tm * st.VT / st.V
	}
	for _, m := range machines() {
		real, ideal := m, m
		ideal.gas = gas.Perfect(m.gas.R, 5.0/3, 3.3e-5, 0.26)
		if m.gas.Kind == gas.Hydrogen {
			ideal.gas = gas.Perfect(m.gas.R, 1.4, 1.4e-5, 0.3)
		}
		light := ideal
		const heavy = 1e13
		ideal.rhoC, real.rhoC = heavy, heavy
		none, _, _ := solve(ideal)
		a, realGas, _ := solve(real)
		b, _, lightMatrix := solve(light)
		near(t, m.name+", real gas", a-none, realGas, 0.15)
		near(t, m.name+", light matrix", b-none, lightMatrix, 0.25)
		t.Logf("%s: lag aside %.1f J; real gas %+.1f (%+.1f by <M p'>), light matrix %+.1f (%+.1f)", m.name, none, a-none, realGas, b-none, lightMatrix)
	}
}
