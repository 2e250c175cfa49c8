package optimize_test

import (
	"context"
	"flag"
	"fmt"
	"os"
	"slices"
	"sync"
	"testing"

	"hotfront/optimize"
	"hotfront/optimize/pareto"
	tp "hotfront/optimize/testproblem"
)

var full = flag.Bool("full", false, "quality table over 11 seeds")

func TestX(t *testing.T) {
	type row struct {
		p      *tp.Problem
		target float64
	}
	rows := []row{{tp.ZDT1(), .994}, {tp.ZDT2(), .985}, {tp.ZDT3(), .988}, {tp.ZDT4(), .985}, {tp.ZDT6(), .985}, {tp.DTLZ2(), .936}, {tp.BNH(), .997}, {tp.SRN(), .995}, {tp.TNK(), .991}, {tp.OSY(), .985}, {tp.WeldedBeam(), .995}, {tp.DTLZ1(), 0}, {tp.C2DTLZ2(), 0}}
	only := os.Getenv("ONLY")
	for _, r := range rows {
		if only != "" && only != r.p.Name {
			continue
		}
		n := 15
		if *full {
			n = 11
		}
		shares := make([]float64, n)
		fronts := make([]float64, n)
		var wg sync.WaitGroup
		for i := range shares {
			wg.Go(func() {
				res, err := optimize.Run(context.Background(), r.p, optimize.Settings{Evaluations: 10000, Seed: uint64(i + 1)}, nil, nil)
				if err != nil {
					t.Fatal(err)
				}
				var pts [][]float64
				for _, p := range res.Front {
					pts = append(pts, p.F)
				}
				var sel [][]float64
				for _, k := range pareto.Choose(pts, r.p.Ref, 100) {
					sel = append(sel, pts[k])
				}
				shares[i] = pareto.Hypervolume(sel, r.p.Ref) / r.p.Ideal
				fronts[i] = res.Hypervolume / r.p.Ideal
			})
		}
		wg.Wait()
		slices.Sort(shares)
		slices.Sort(fronts)
		if os.Getenv("SHORT") != "" {
			fmt.Printf("%s %.4f/%.3f  ", r.p.Name, shares[n/2], shares[0])
			continue
		}
		t.Logf("%-8s %.4f [%.3f] min %.4f max %.4f   whole %.4f ideal %g", r.p.Name, shares[n/2], r.target, shares[0], shares[n-1], fronts[n/2], r.p.Ideal)
	}
}
