package optimize_test

import (
	"context"
	"errors"
	"math"
	"reflect"
	"slices"
	"sync/atomic"
	"testing"

	"hotfront/optimize"
	tp "hotfront/optimize/testproblem"
)

func TestLedgerErrors(t *testing.T) {
	p, set := tp.BNH(), optimize.Settings{Evaluations: 100, Seed: 1}
	ledger := &memory{}
	mustRun(t, p, set, ledger)
	other := set
	other.Seed = 2
	_, err := optimize.Run(context.Background(), p, other, ledger, nil)
	mismatch, ok := errors.AsType[*optimize.MismatchError](err)
	if !errors.Is(err, optimize.ErrLedgerMismatch) || !ok || mismatch.Seq != 0 || mismatch.Variable != "x" {
		t.Errorf("another seed: %v", err)
	}
	_, err = optimize.Run(context.Background(), tp.OSY(), set, ledger, nil)
	if !errors.Is(err, optimize.ErrLedgerMismatch) {
		t.Errorf("another problem: %v", err)
	}
	full := errors.New("disk full")
	if _, err = optimize.Run(context.Background(), p, set, &memory{broken: full}, nil); !errors.Is(err, full) {
		t.Errorf("broken ledger: %v", err)
	}
}

// TestLedgerThatFailsLater: a ledger that fails in the middle of a run ends it with its error, and what it holds
// is whole. The run does not use up its budget first.
func TestLedgerThatFailsLater(t *testing.T) {
	full := errors.New("disk full")
	for _, workers := range []int{1, 2} {
		ledger := &filling{room: 300, full: full}
		var evaluated atomic.Int64
		p := counting{tp.BNH(), func() { evaluated.Add(1) }}
		res, err := optimize.Run(context.Background(), p, optimize.Settings{Evaluations: 5_000_000, Seed: 1, Workers: workers}, ledger, nil)
		if !errors.Is(err, full) || res != nil {
			t.Fatalf("%v, %v", res, err)
		}
		if n := len(ledger.points); n > 300 || evaluated.Load() > 1_000_000 {
			t.Errorf("%d designs stored, %d evaluated", n, evaluated.Load())
		}
		ledger.room = math.MaxInt
		set := optimize.Settings{Evaluations: 2000, Seed: 1, Workers: workers}
		if got, want := mustRun(t, tp.BNH(), set, ledger), mustRun(t, tp.BNH(), set, nil); !reflect.DeepEqual(got, want) {
			t.Error("another result after the ledger has failed")
		}
	}
}

// filling is a ledger with room for so many designs.
type filling struct {
	memory
	room int
	full error
}

func (f *filling) Record(first int, points []optimize.Point) error {
	if first+len(points) > f.room {
		return f.full
	}
	return f.memory.Record(first, points)
}

// TestResultsOfFewAreStored: further results are recorded of designs on the front of the designs so far alone, and
// while nothing is feasible of those that come nearest; that is enough for an interrupted run to end as an
// undisturbed one, with the results of its front or of its nearest design.
func TestResultsOfFewAreStored(t *testing.T) {
	for _, bar := range []float64{0.7, -1} { // with the second no design is feasible
		p := newSized(0)
		p.bar = bar
		set := optimize.Settings{Evaluations: 900, Seed: 3, Workers: 2}
		whole := &memory{}
		want := mustRun(t, p, set, whole)
		stored := 0
		for _, q := range whole.points {
			if q.Extra != nil {
				stored++
			}
		}
		if stored == 0 || stored > len(whole.points)/2 {
			t.Errorf("results of %d of %d designs stored", stored, len(whole.points))
		}
		for cut := 0; cut < 900; cut += 61 {
			ledger := &memory{points: slices.Clone(whole.points[:cut])}
			if got := mustRun(t, p, set, ledger); !reflect.DeepEqual(got, want) {
				t.Fatalf("another result after a cut at %d", cut)
			}
			if !reflect.DeepEqual(ledger.points, whole.points) {
				t.Fatalf("other designs or results stored after a cut at %d", cut)
			}
		}
		evaluator := p.NewEvaluator()
		check := func(q optimize.Point) {
			again := optimize.NewPoint(p)
			copy(again.X, q.X)
			evaluator.Evaluate(&again)
			if !reflect.DeepEqual(again, q) {
				t.Errorf("design %v comes with another's results", q.X)
			}
		}
		for _, q := range want.Front {
			check(q)
		}
		if (want.LeastViolation != nil) != (bar < 0) || (len(want.Front) == 0) != (bar < 0) {
			t.Fatalf("front of %d, nearest %v", len(want.Front), want.LeastViolation)
		}
		if want.LeastViolation != nil {
			check(*want.LeastViolation)
		}
		// What a run like this would have stored must be there.
		for i := range whole.points {
			whole.points[i].Extra = nil
		}
		if _, err := optimize.Run(context.Background(), p, set, whole, nil); !errors.Is(err, optimize.ErrLedgerMismatch) {
			t.Errorf("ledger without results: %v", err)
		}
	}
}
