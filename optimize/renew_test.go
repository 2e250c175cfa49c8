package optimize_test

import (
	"context"
	"math"
	"reflect"
	"testing"

	"hotfront/optimize"
	tp "hotfront/optimize/testproblem"
)

// sinkhole has a broad way to a poor front and a narrow one to a good one, with the second variable to tell them
// apart: what a population that has settled on the poor one cannot find by small steps, a second start can.
//
//	g = 1.4 + sum (x_i - 0.8)^2           for x_2 > 0.3
//	g = 1 + 4 (x_2 - 0.15)^2 + 2 sum_{i > 2} (x_i - 0.2)^2  otherwise
//	f = (x_1, g (1 - sqrt(x_1 / g)))
//
// The front of g = 1.4 alone has a share of less than 0.8.
func sinkhole() *tp.Problem {
	p := tp.Valley()
	p.Name, p.About, p.Ideal, p.IdealFrom = "Sinkhole", "two fronts, the poor one easier; own", 1.21-1.0/3, "closed form"
	for i := range p.Vars {
		p.Vars[i].Low, p.Vars[i].High = 0, 1
	}
	p.Function = func(f, _, x []float64) {
		g := 1.4
		if x[1] > 0.3 {
			for _, v := range x[2:] {
				g += (v - 0.8) * (v - 0.8)
			}
		} else {
			g = 1 + 4*(x[1]-0.15)*(x[1]-0.15)
			for _, v := range x[2:] {
				g += 2 * (v - 0.2) * (v - 0.2)
			}
		}
		q := x[0] / g
		f[0], f[1] = x[0], g*(1-math.Sqrt(q))
	}
	return p
}

// TestSecondStart holds that of the runs which settled on the poor front one in three finds the good one
// afterwards; none does without a second start.
func TestSecondStart(t *testing.T) {
	p := sinkhole()
	settled, found := 0, 0
	for seed := range uint64(24) {
		short := runOf(t, p, 2500, seed, 1)
		if short.Hypervolume/p.Ideal > 0.8 {
			continue
		}
		settled++
		if long := runOf(t, p, 12_000, seed, 1); long.Hypervolume/p.Ideal > 0.98 {
			found++
		}
	}
	t.Logf("%d of 24 runs settle on the poor front, %d of them find the good one", settled, found)
	if settled < 4 || 3*found < settled {
		t.Errorf("%d of 24 runs settle on the poor front, %d of them find the good one", settled, found)
	}
}

// TestSecondStartIsRepeatable holds that neither workers nor the budget show in runs that have begun anew.
func TestSecondStartIsRepeatable(t *testing.T) {
	p := tp.Mixed()
	one, four := runOf(t, p, 9000, 3, 1), runOf(t, p, 9000, 3, 4)
	if !reflect.DeepEqual(one, four) {
		t.Error("result depends on the number of workers")
	}
	less := runOf(t, p, 6000, 3, 2)
	rows := len(less.History) - 1 // the last row is where the budget ends
	if rows < 50 || !reflect.DeepEqual(less.History[:rows], one.History[:rows]) {
		t.Errorf("a smaller budget runs differently: %d rows", rows)
	}
}

func runOf(t *testing.T, p optimize.Problem, evaluations int, seed uint64, workers int) *optimize.Result {
	t.Helper()
	res, err := optimize.Run(context.Background(), p, optimize.Settings{Evaluations: evaluations, Seed: seed, Workers: workers}, nil, nil)
	if err != nil {
		t.Fatal(err)
	}
	return res
}
