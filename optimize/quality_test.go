package optimize_test

import (
	"context"
	"flag"
	"os"
	"slices"
	"testing"
	"time"

	"hotfront/optimize"
	"hotfront/optimize/pareto"
	tp "hotfront/optimize/testproblem"
)

// picked is the number of designs that stand for a front in the table.
const picked = 100

// fronts runs a problem once and returns the shares of the ideal hypervolume that the picked designs and the
// whole front reach.
func fronts(t *testing.T, p *tp.Problem, evaluations int, seed uint64) (share, whole float64) {
	t.Helper()
	set := optimize.Settings{Evaluations: evaluations, Seed: seed, Workers: 1}
	res, err := optimize.Run(context.Background(), p, set, nil, nil)
	if err != nil {
		t.Fatal(err)
	}
	front := make([][]float64, len(res.Front))
	for i, q := range res.Front {
		front[i] = q.F
	}
	var chosen [][]float64
	for _, i := range pareto.Choose(front, p.Ref, picked) {
		chosen = append(chosen, front[i])
	}
	return pareto.Hypervolume(chosen, p.Ref) / p.Ideal, res.Hypervolume / p.Ideal
}

func TestMain(m *testing.M) {
	flag.Bool("full", false, "quality table over 41 seeds instead of 11")
	flag.Bool("million", false, "memory of a run of a million designs")
	flag.Parse()
	os.Exit(m.Run())
}

// TestQualityTable prints, for each problem, the median over the seeds of the share of the ideal hypervolume
// that 100 designs picked from the front reach after 10,000 evaluations, and holds it against a floor. Eleven
// seeds by default, since a median of fewer is a lottery on ZDT4, where every third run stays in a local front;
// one under the race detector, which is too few to judge by; go test -run TestQualityTable -v . -full runs 41.
//
// The floor lies a little below what 11 seeds gave when it was set; it is there to notice a loss of quality.
// The driver's numbers were set on the problems above the line; those below were only watched.
func TestQualityTable(t *testing.T) {
	seeds := defaultSeeds
	if flag.Lookup("full").Value.String() == "true" {
		seeds = 41
	}
	for _, row := range []struct {
		problem *tp.Problem
		floor   float64
	}{
		{tp.ZDT1(), 0.994}, {tp.ZDT2(), 0.985}, {tp.ZDT3(), 0.988}, {tp.ZDT4(), 0.80}, {tp.ZDT6(), 0.985},
		{tp.DTLZ2(), 0.936}, {tp.BNH(), 0.996}, {tp.SRN(), 0.993}, {tp.TNK(), 0.991}, {tp.OSY(), 0.95},
		{tp.WeldedBeam(), 0.98}, // ---
		{tp.DTLZ1(), 0.30}, {tp.C2DTLZ2(), 0.995},
		{tp.Valley(), 0.98}, {tp.Turned(), 0.98}, {tp.Needle(), 0.97}, {tp.Mixed(), 0.99},
	} {
		begin := time.Now()
		share, whole := make([]float64, seeds), make([]float64, seeds)
		for i := range seeds {
			share[i], whole[i] = fronts(t, row.problem, 10_000, uint64(i+1))
		}
		slices.Sort(share)
		slices.Sort(whole)
		t.Logf("%-9s median %.4f, least %.4f, most %.4f; whole front %.4f; %v a run", row.problem.Name,
			share[seeds/2], share[0], share[seeds-1], whole[seeds/2], time.Since(begin)/time.Duration(seeds))
		if seeds > 1 && !(share[seeds/2] >= row.floor) || share[seeds-1] > 1.0005 {
			t.Errorf("%s: median share %.4f, floor %.4f; most %.4f", row.problem.Name, share[seeds/2], row.floor, share[seeds-1])
		}
	}
}
