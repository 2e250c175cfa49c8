package optimize_test

import (
	"context"
	"errors"
	"math"
	"reflect"
	"testing"

	"hotfront/optimize"
	"hotfront/optimize/pareto"
	tp "hotfront/optimize/testproblem"
)

// TestSimplexFindsTheMinimum holds the driver against minima known in closed form. The tolerance is a share
// of the aim's size at the minimum or of one.
func TestSimplexFindsTheMinimum(t *testing.T) {
	for _, c := range []struct {
		problem     *tp.Problem
		evaluations int
		tolerance   float64
	}{
		{tp.Rosenbrock(2), 2000, 1e-12},
		{tp.Rosenbrock(5), 6000, 1e-12},
		{tp.Corner(), 3000, 1e-6},
		{tp.Crescent(), 4000, 1e-6},
	} {
		for seed := range uint64(3) {
			set := optimize.Settings{Evaluations: c.evaluations, Seed: seed, Driver: optimize.Simplex}
			res := mustRun(t, c.problem, set, nil)
			if len(res.Front) != 1 {
				t.Errorf("%s: front of %d", c.problem.Name, len(res.Front))
				continue
			}
			got, want := res.Front[0].F[0], c.problem.Ideal
			if miss := (got - want) / math.Max(1, math.Abs(want)); miss > c.tolerance || miss < -1e-9 {
				t.Errorf("%s, seed %d: lowest %.9g, want %.9g", c.problem.Name, seed, got, want)
			}
		}
	}
}

// TestSimplexMinimumOnABound: the lowest value lies in a corner of the box.
func TestSimplexMinimumOnABound(t *testing.T) {
	p := tp.Rosenbrock(3)
	for k := range p.Vars {
		p.Vars[k].High = 0.5 // the valley is left below the minimum at one
	}
	p.Function = func(f, _, x []float64) { f[0] = -x[0] - 2*x[1] - 3*x[2] }
	res := mustRun(t, p, optimize.Settings{Evaluations: 1500, Seed: 1, Driver: optimize.Simplex}, nil)
	if got := res.Front[0].F[0]; got > -3+1e-6 {
		t.Errorf("lowest %v, want -3", got)
	}
}

// TestSimplexOnWholeNumbers: real and whole numbers, a list and a choice; the choice is met by several places
// to begin, since a simplex does not move in it.
func TestSimplexOnWholeNumbers(t *testing.T) {
	p := tp.Mixed()
	p.AimCount, p.Ref = 1, []float64{10}
	inner := p.Function
	p.Function = func(f, _, x []float64) {
		var two [2]float64
		inner(two[:], nil, x)
		f[0] = two[0] + two[1]
	}
	// f1 + g (1 - sqrt(f1 / g)) at g = 1 is least at f1 = 1/4.
	res := mustRun(t, p, optimize.Settings{Evaluations: 5000, Seed: 1, Driver: optimize.Simplex, Population: 6}, nil)
	if got := res.Front[0].F[0]; got > 0.75*1.02 || got < 0.75 {
		t.Errorf("lowest %v, want 0.75", got)
	}
	small := tp.Stock()
	small.AimCount, small.Ref = 1, small.Ref[:1]
	both := small.Function
	small.Function = func(f, g, x []float64) {
		var two [2]float64
		both(two[:], g, x)
		f[0] = two[0]
	}
	end := mustRun(t, small, optimize.Settings{Evaluations: 100_000, Seed: 1, Driver: optimize.Simplex}, nil)
	if !end.Exhausted || end.Evaluations > 576 {
		t.Errorf("a small space: %d evaluations, exhausted %v", end.Evaluations, end.Exhausted)
	}
}

func TestPolish(t *testing.T) {
	for _, p := range []*tp.Problem{tp.ZDT1(), tp.Turned(), tp.OSY(), tp.WeldedBeam(), tp.DTLZ2(), tp.Mixed()} {
		res := mustRun(t, p, optimize.Settings{Evaluations: 600, Seed: 1}, nil)
		from := res.Front[len(res.Front)/2]
		first, err := optimize.Polish(context.Background(), p, from, optimize.PolishSettings{Evaluations: 1500}, nil)
		if err != nil {
			t.Fatal(err)
		}
		if !first.Improved || !pareto.Dominates(first.Point.F, from.F) || pareto.Violation(first.Point.G) > 0 {
			t.Errorf("%s: improved %v, from %v to %v", p.Name, first.Improved, from.F, first.Point.F)
		}
		ledger := &memory{}
		for _, set := range []optimize.PolishSettings{{Evaluations: 700, Workers: 7}, {Evaluations: 1500, Workers: 2}} {
			again, err := optimize.Polish(context.Background(), p, from, set, ledger)
			if err != nil {
				t.Fatal(err)
			}
			if set.Evaluations == 1500 && !reflect.DeepEqual(again, first) {
				t.Errorf("%s: other workers and a break gave another result", p.Name)
			}
		}
	}
}

// TestPolishNeverWorsens: a design that is best already is returned as it is.
func TestPolishNeverWorsens(t *testing.T) {
	p := tp.ZDT1()
	best := optimize.NewPoint(p)
	best.X[0] = 0.25
	p.Function(best.F, best.G, best.X)
	got, err := optimize.Polish(context.Background(), p, best, optimize.PolishSettings{Evaluations: 500, Scale: []float64{1, 1}}, nil)
	if err != nil {
		t.Fatal(err)
	}
	if got.Improved || got.Seq != 0 || !reflect.DeepEqual(got.Point, best) {
		t.Errorf("got %+v", got)
	}
	_, err = optimize.Polish(context.Background(), p, best, optimize.PolishSettings{Evaluations: 500, Scale: []float64{1, 0}}, nil)
	if !errors.Is(err, optimize.ErrProblem) {
		t.Errorf("scale of zero: %v", err)
	}
	ctx, cancel := context.WithCancel(context.Background())
	cancel()
	got, err = optimize.Polish(ctx, p, best, optimize.PolishSettings{Evaluations: 500}, nil)
	if !errors.Is(err, context.Canceled) || !reflect.DeepEqual(got.Point, best) {
		t.Errorf("cancelled: %+v, %v", got, err)
	}
}
