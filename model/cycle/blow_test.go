package cycle

import (
	"fmt"
	"math"
	"testing"

	"hotfront/model/correlation"
	"hotfront/model/gas"
)

// blowPath is a regenerator alone between two displaced volumes at Th and Tk, both of perfect film and
// behind exchangers of perfect film, so that either blow enters at a fixed temperature. The volumes rise and fall
// at constant rate with dVe/Th = -dVc/Tk, so that mass flow and pressure stay constant over each blow, and
// the matrix holds next to no gas. That is the blow of the textbook, through the solver's own cells.
//
//	ntu    film conductance over flow capacity rate of one blow [-]
//	ratio  heat capacity of the matrix over that of the gas of one blow [-]
func blowPath(ntu, ratio float64, cells, steps int) *Path {
	const th, tk, mean, freq, swept = 600.0, 300.0, 1e6, 10.0, 1e-4
	g := gas.Perfect(2077.265, 5.0/3, 2e-5, 0.15)
	var st gas.State
	g.At(&st, th, mean)
	blow := swept / st.V // mass of one blow [kg]
	rate := 2 * freq * blow * st.Cp
	p := &Path{Gas: g, Mean: mean, Period: 1 / freq}
	add := func(c Cell) {
		p.Cells[p.N] = c
		p.N++
	}
	const void = 1e-12 // [m3]
	n := float64(cells)
	add(Cell{Kind: Space, Part: PartExpansion, Wall: th, FixedFilm: perfectFilm})
	add(Cell{Kind: Tube, Part: PartHeater, Volume: void, Wall: th, Outer: th, FixedFilm: perfectFilm})
	for i := range cells {
		add(Cell{Kind: Matrix, Part: PartRegenerator, Volume: void, Wall: th + (tk-th)*(float64(i)+0.5)/n, FixedFilm: ntu * rate / n,
			Capacity: ratio * blow * st.Cp / n})
	}
	add(Cell{Kind: Tube, Part: PartCooler, Volume: void, Wall: tk, Outer: tk, FixedFilm: perfectFilm})
	add(Cell{Kind: Space, Part: PartCompression, Wall: tk, FixedFilm: perfectFilm})
	volumes(&p.Fine, steps, freq, func(angle float64) (ve, dve, vc, dvc float64) {
		const clear = 0.2 * swept
		x := (angle - 1e-9) / math.Pi // the rate at a turn is that of the step that ends there
		d := -1.0
		switch {
		case x < 0: // the end of the cycle before
			x, d = -x, 1
		case x > 1:
			x, d = 2-x, 1
		}
		return clear + swept*(1-x), swept / math.Pi * d, (clear + swept*x) * tk / th, -swept / math.Pi * d * tk / th
	})
	return p
}

// blowEffectiveness is the share of the heat put through the regenerator that it returns: what is lost
// is the net flow of enthalpy.
func blowEffectiveness(t *testing.T, p *Path) float64 {
	t.Helper()
	var r Result
	NewSolver(correlation.NewFast()).Solve(&r, p, DefaultSettings())
	if !r.Converged {
		t.Fatalf("not converged after %d cycles", r.Cycles)
	}
	var st gas.State
	p.Gas.At(&st, 600, p.Mean)
	most := 1e-4 / st.V * st.Cp * 300
	return 1 - r.Enthalpy[p.N/2]/most
}

// TestBlow holds the solver's matrix against the textbook's balanced regenerator: NTU/(NTU + 2) at large
// matrix capacity to 1e-4 of the effectiveness and 1 % of what is lost, and with finite capacity
// ratio C the factor 1 - 1/(9 C^1.93) within 1 %, in the range of that fit (NTU of one blow 4 to 28).
// A matrix lighter than twice the gas of a blow, lighter than any real one, wants the finer grid: there
// twelve cells and 60 steps give up to 1.4 % too much.
//
// Source: W. M. Kays and A. L. London, Compact heat exchangers, 3rd edition 1984; the factor from memory.
func TestBlow(t *testing.T) {
	for _, ntu := range []float64{5, 10, 20, 50, 150} {
		eff := blowEffectiveness(t, blowPath(ntu, 100, 12, 60))
		near(t, fmt.Sprintf("large capacity, NTU %g", ntu), eff, ntu/(ntu+2), 1e-4)
		near(t, fmt.Sprintf("large capacity, NTU %g, loss", ntu), 1-eff, 2/(ntu+2), 0.01)
	}
	for _, ratio := range []float64{5, 3, 2, 1.5} {
		for _, ntu := range []float64{5, 10, 20} {
			want := ntu / (ntu + 2) * (1 - 1/(9*math.Pow(ratio, 1.93)))
			if ratio >= 2 {
				eff := blowEffectiveness(t, blowPath(ntu, ratio, 12, 60))
				near(t, fmt.Sprintf("capacity ratio %g, NTU %g", ratio, ntu), eff, want, 0.01)
			}
			eff := blowEffectiveness(t, blowPath(ntu, ratio, 24, 240))
			near(t, fmt.Sprintf("capacity ratio %g, NTU %g, fine grid", ratio, ntu), eff, want, 0.01)
		}
	}
}
