package optimize_test

import (
	"context"
	"errors"
	"math"
	"math/rand/v2"
	"reflect"
	"slices"
	"strings"
	"sync/atomic"
	"testing"

	"hotfront/optimize"
	tp "hotfront/optimize/testproblem"
)

// memory is a ledger in memory. It keeps copies, as a file would.
type memory struct {
	points  []optimize.Point
	broken  error // what Record returns
	records int
}

func (m *memory) Recall(first int, dst []optimize.Point) (int, error) {
	n := 0
	for ; n < len(dst) && first+n < len(m.points); n++ {
		dst[n] = clone(m.points[first+n])
	}
	return n, nil
}

func (m *memory) Record(first int, points []optimize.Point) error {
	if m.broken != nil {
		return m.broken
	}
	if first != len(m.points) {
		return errors.New("record leaves a gap")
	}
	m.records++
	for _, p := range points {
		m.points = append(m.points, clone(p))
	}
	return nil
}

func clone(p optimize.Point) optimize.Point {
	return optimize.Point{X: slices.Clone(p.X), F: slices.Clone(p.F), G: slices.Clone(p.G), Extra: slices.Clone(p.Extra), Cause: p.Cause}
}

// shaped is a test problem with further behaviour around its evaluator.
type shaped struct {
	*tp.Problem
	before func(p *optimize.Point) // may fill in a cause or panic
}

func (s shaped) NewEvaluator() optimize.Evaluator {
	return shapedEvaluator{s.Problem.NewEvaluator(), s.before}
}

type shapedEvaluator struct {
	inner  optimize.Evaluator
	before func(p *optimize.Point)
}

func (e shapedEvaluator) Evaluate(p *optimize.Point) {
	e.before(p)
	if p.Cause == "" {
		e.inner.Evaluate(p)
	}
}

// failing lets designs fail in every way there is.
func failing() optimize.Problem {
	p := tp.BNH()
	inner := p.Function
	p.Function = func(f, g, x []float64) {
		inner(f, g, x)
		if x[0] > 4.5 {
			f[1] = math.NaN()
		}
		if x[1] > 2.9 {
			g[0] = math.Inf(1)
		}
	}
	return shaped{p, func(q *optimize.Point) {
		switch {
		case q.X[0] < 0.2:
			q.Cause = "cannot be built"
		case q.X[0] < 0.4:
			panic("lost")
		}
	}}
}

// cases are problems and drivers that go different ways through the code.
func cases() map[string]struct {
	problem optimize.Problem
	set     optimize.Settings
} {
	type c = struct {
		problem optimize.Problem
		set     optimize.Settings
	}
	started := tp.Mixed()
	started.Starts = [][]float64{{0.3, 0.1, 0.1, 0.1, 0.1, 12, 3, 1}, {0.1 + 0.2, 0.7, 0.7, 0.7, 0.7, 33, 10, 2}}
	return map[string]c{
		"two aims":      {tp.ZDT3(), optimize.Settings{Evaluations: 700, Seed: 1}},
		"three aims":    {tp.DTLZ2(), optimize.Settings{Evaluations: 500, Seed: 2, Population: 24}},
		"limits":        {tp.OSY(), optimize.Settings{Evaluations: 800, Seed: 3}},
		"no start":      {tp.Needle(), optimize.Settings{Evaluations: 900, Seed: 4, Population: 20}},
		"mixed":         {started, optimize.Settings{Evaluations: 600, Seed: 5}},
		"small space":   {tp.Stock(), optimize.Settings{Evaluations: 5000, Seed: 6}},
		"failures":      {failing(), optimize.Settings{Evaluations: 600, Seed: 7}},
		"one aim":       {tp.Rosenbrock(3), optimize.Settings{Evaluations: 500, Seed: 8}},
		"results":       {newSized(0), optimize.Settings{Evaluations: 700, Seed: 11}},
		"simplex":       {tp.Rosenbrock(4), optimize.Settings{Evaluations: 900, Seed: 9, Driver: optimize.Simplex}},
		"simplex limit": {tp.Crescent(), optimize.Settings{Evaluations: 700, Seed: 10, Driver: optimize.Simplex, Population: 3}},
	}
}

func mustRun(t *testing.T, p optimize.Problem, set optimize.Settings, ledger optimize.Ledger) *optimize.Result {
	t.Helper()
	res, err := optimize.Run(context.Background(), p, set, ledger, nil)
	if err != nil {
		t.Fatal(err)
	}
	return res
}

func TestRunSameForAnyWorkers(t *testing.T) {
	for name, c := range cases() {
		t.Run(name, func(t *testing.T) {
			var first *optimize.Result
			var stored *memory
			for _, workers := range []int{1, 2, 7} {
				c.set.Workers = workers
				ledger := &memory{}
				res := mustRun(t, c.problem, c.set, ledger)
				if first == nil {
					first, stored = res, ledger
					continue
				}
				if !reflect.DeepEqual(res, first) {
					t.Errorf("%d workers: another result", workers)
				}
				if !reflect.DeepEqual(ledger.points, stored.points) {
					t.Errorf("%d workers: other designs stored", workers)
				}
			}
			if len(stored.points) != first.Evaluations {
				t.Errorf("%d designs stored, %d evaluated", len(stored.points), first.Evaluations)
			}
			if len(first.Front) == 0 {
				t.Error("no front")
			}
		})
	}
}

// TestResume cuts runs at random places, also inside a batch, and goes on until the budget is used up.
func TestResume(t *testing.T) {
	for name, c := range cases() {
		t.Run(name, func(t *testing.T) {
			c.set.Workers = 2
			want := mustRun(t, c.problem, c.set, nil)
			rng := rand.New(rand.NewPCG(1, 2))
			ledger := &memory{}
			for cut := 1; ; cut++ {
				ctx, cancel := context.WithCancel(context.Background())
				left := int64(1 + rng.IntN(200))
				var evaluated atomic.Int64
				p := counting{c.problem, func() {
					if evaluated.Add(1) == left {
						cancel()
					}
				}}
				before := len(ledger.points)
				res, err := optimize.Run(ctx, p, c.set, ledger, nil)
				cancel()
				if got := len(ledger.points) - before; int64(got) != evaluated.Load() {
					t.Fatalf("%d designs evaluated, %d stored", evaluated.Load(), got)
				}
				if err == nil {
					if !reflect.DeepEqual(res, want) {
						t.Errorf("another result after %d cuts", cut)
					}
					return
				}
				if !errors.Is(err, context.Canceled) || res == nil || res.Evaluations != len(ledger.points) {
					t.Fatalf("cut %d: %v, %+v", cut, err, res)
				}
			}
		})
	}
}

// counting calls count for every evaluation.
type counting struct {
	optimize.Problem
	count func()
}

func (c counting) NewEvaluator() optimize.Evaluator {
	return shapedEvaluator{c.Problem.NewEvaluator(), func(*optimize.Point) { c.count() }}
}

// TestLargerBudgetContinues: the designs of a short run are the first designs of a long one, which recalls
// them and ends as an undisturbed long run does.
func TestLargerBudgetContinues(t *testing.T) {
	for name, c := range cases() {
		t.Run(name, func(t *testing.T) {
			ledger := &memory{}
			short := c.set
			short.Evaluations = 333
			mustRun(t, c.problem, short, ledger)
			var last optimize.Progress
			got, err := optimize.Run(context.Background(), c.problem, c.set, ledger, func(p optimize.Progress) { last = p })
			if err != nil {
				t.Fatal(err)
			}
			if want := mustRun(t, c.problem, c.set, nil); !reflect.DeepEqual(got, want) {
				t.Error("another result than without the break")
			}
			if last.Recalled != 333 || last.Evaluations != got.Evaluations || last.Hypervolume != got.Hypervolume {
				t.Errorf("last progress %+v", last)
			}
		})
	}
}

func TestFailuresAreValues(t *testing.T) {
	res := mustRun(t, failing(), optimize.Settings{Evaluations: 1000, Seed: 1, Workers: 2}, nil)
	sum := 0
	causes := map[string]bool{}
	for i, c := range res.Failures {
		sum += c.Count
		causes[c.Cause] = true
		if i > 0 && c.Count > res.Failures[i-1].Count {
			t.Error("causes are not in order")
		}
	}
	if sum != res.Failed || res.Failed == 0 || res.Feasible+res.Failed > res.Evaluations {
		t.Errorf("failed %d, causes %v", res.Failed, res.Failures)
	}
	for _, want := range []string{"cannot be built", "panic: lost", "aim 2 is NaN", "limit 1 is +Inf"} {
		if !causes[want] {
			t.Errorf("cause %q is missing in %v", want, res.Failures)
		}
	}
	for _, p := range res.Front {
		if p.Cause != "" || p.X[0] < 0.4 || p.X[0] > 4.5 {
			t.Errorf("a failed design is on the front: %+v", p)
		}
	}
}

func TestNothingFeasible(t *testing.T) {
	p := tp.BNH()
	inner := p.Function
	p.Function = func(f, g, x []float64) {
		inner(f, g, x)
		g[0] = 1 + (x[0]-2)*(x[0]-2) + x[1] // least at (2, 0)
	}
	res := mustRun(t, p, optimize.Settings{Evaluations: 1500, Seed: 1}, nil)
	if len(res.Front) != 0 || res.Feasible != 0 || res.Hypervolume != 0 {
		t.Fatalf("a front of %d", len(res.Front))
	}
	near := res.LeastViolation
	if near == nil || math.Abs(near.X[0]-2) > 0.05 || near.X[1] > 0.05 || near.G[0] < 1 {
		t.Errorf("nearest design %+v", near)
	}
	all := shaped{tp.BNH(), func(q *optimize.Point) { q.Cause = "no" }}
	res = mustRun(t, all, optimize.Settings{Evaluations: 300, Seed: 1}, nil)
	if res.LeastViolation != nil || res.LeastViolationSeq != -1 || res.Failed != 300 {
		t.Errorf("all failed: %+v", res)
	}
}

// TestSmallSpaceIsExhausted: a space of 576 designs is visited whole, each design once, and then the search
// ends.
func TestSmallSpaceIsExhausted(t *testing.T) {
	p := tp.Stock()
	ledger := &memory{}
	res := mustRun(t, p, optimize.Settings{Evaluations: 100_000, Seed: 1}, ledger)
	if !res.Exhausted || res.Evaluations != 12*12*4 {
		t.Fatalf("exhausted %v after %d", res.Exhausted, res.Evaluations)
	}
	seen := map[[3]float64]bool{}
	f, g := make([]float64, 2), make([]float64, 1)
	for _, q := range ledger.points {
		seen[[3]float64(q.X)] = true
		p.Function(f, g, q.X)
		if !slices.Equal(f, q.F) || !slices.Equal(g, q.G) {
			t.Fatalf("design %v holds another's result", q.X)
		}
	}
	if len(seen) != 12*12*4 {
		t.Errorf("%d designs are different", len(seen))
	}
}

// TestSmallSpaceIsSearchedWell: the whole front of the same space is found in half the evaluations.
func TestSmallSpaceIsSearchedWell(t *testing.T) {
	p := tp.Stock()
	whole := mustRun(t, p, optimize.Settings{Evaluations: 100_000, Seed: 1}, nil)
	part := mustRun(t, p, optimize.Settings{Evaluations: 288, Seed: 2}, nil)
	if part.Hypervolume < 0.999*whole.Hypervolume {
		t.Errorf("hypervolume %v of %v", part.Hypervolume, whole.Hypervolume)
	}
}

func TestStartDesignsComeFirst(t *testing.T) {
	p := tp.ZDT1()
	start := make([]float64, 30)
	for i := range start {
		start[i] = 0.1 * float64(i%3) // 0.2 is not exact in scaled numbers
	}
	for _, set := range []optimize.Settings{{Evaluations: 50}, {Evaluations: 50, Driver: optimize.Simplex}} {
		if set.Driver == optimize.Simplex {
			p = tp.Rosenbrock(30)
		}
		p.Starts = [][]float64{start}
		ledger := &memory{}
		mustRun(t, p, set, ledger)
		if !slices.Equal(ledger.points[0].X, start) {
			t.Errorf("%v: first design is %v", set.Driver, ledger.points[0].X)
		}
	}
}

func TestContradictionsAreReported(t *testing.T) {
	ok := optimize.Settings{Evaluations: 10}
	for _, c := range []struct {
		want   string
		set    optimize.Settings
		change func(p *tp.Problem)
	}{
		{"budget", optimize.Settings{}, func(*tp.Problem) {}},
		{"population", optimize.Settings{Evaluations: 10, Population: -1}, func(*tp.Problem) {}},
		{"one aim", optimize.Settings{Evaluations: 10, Driver: optimize.Simplex}, func(*tp.Problem) {}},
		{"unknown driver 9", optimize.Settings{Evaluations: 10, Driver: 9}, func(*tp.Problem) {}},
		{"no variables", ok, func(p *tp.Problem) { p.Vars = nil }},
		{"bounds", ok, func(p *tp.Problem) { p.Vars[0].Low = 9 }},
		{"bounds", ok, func(p *tp.Problem) { p.Vars[0].High = math.NaN() }},
		{"whole", ok, func(p *tp.Problem) { p.Vars[0].Kind, p.Vars[0].High = optimize.Integer, 4.5 }},
		{"4 aims", ok, func(p *tp.Problem) { p.AimCount = 4 }},
		{"reference", ok, func(p *tp.Problem) { p.Ref = nil }},
		{"reference", ok, func(p *tp.Problem) { p.Ref = []float64{1, math.Inf(1)} }},
		{"start design 0", ok, func(p *tp.Problem) { p.Starts = [][]float64{{1}} }},
		{"outside", ok, func(p *tp.Problem) { p.Starts = [][]float64{{1, 17}} }},
	} {
		p := tp.BNH()
		c.change(p)
		_, err := optimize.Run(context.Background(), p, c.set, nil, nil)
		if !errors.Is(err, optimize.ErrProblem) || !strings.Contains(err.Error(), c.want) {
			t.Errorf("want %q, got %v", c.want, err)
		}
	}
}

// TestFixedVariables: variables without a range keep their value, and a space of one design ends at once.
func TestFixedVariables(t *testing.T) {
	p := tp.BNH()
	p.Vars[1].Low, p.Vars[1].High = 1.5, 1.5
	ledger := &memory{}
	mustRun(t, p, optimize.Settings{Evaluations: 200, Seed: 1}, ledger)
	for _, q := range ledger.points {
		if q.X[1] != 1.5 {
			t.Fatalf("fixed variable is %v", q.X[1])
		}
	}
	p.Vars[0].Low, p.Vars[0].High = 2, 2
	if res := mustRun(t, p, optimize.Settings{Evaluations: 200, Seed: 1}, nil); res.Evaluations != 1 || !res.Exhausted {
		t.Errorf("one design: %d evaluations, exhausted %v", res.Evaluations, res.Exhausted)
	}
}

func TestHistoryAndProgress(t *testing.T) {
	var seen []optimize.Progress
	res, err := optimize.Run(context.Background(), tp.ZDT1(), optimize.Settings{Evaluations: 1000, Seed: 1}, nil,
		func(p optimize.Progress) { seen = append(seen, p) })
	if err != nil {
		t.Fatal(err)
	}
	if len(seen) != len(res.History) {
		t.Fatalf("%d progress reports, %d rows", len(seen), len(res.History))
	}
	for i, h := range res.History {
		p := seen[i]
		if p.Evaluations != h.Evaluations || p.Hypervolume != h.Hypervolume || p.Front != h.Front || p.Generation != i+1 {
			t.Errorf("row %d: %+v, progress %+v", i, h, p)
		}
		if i > 0 && (h.Hypervolume < res.History[i-1].Hypervolume || h.Evaluations <= res.History[i-1].Evaluations) {
			t.Errorf("row %d goes back: %+v", i, h)
		}
	}
	if last := res.History[len(res.History)-1]; last.Evaluations != 1000 || last.Hypervolume != res.Hypervolume {
		t.Errorf("last row %+v", last)
	}
	for i := 1; i < len(res.Front); i++ {
		if slices.Compare(res.Front[i-1].F, res.Front[i].F) >= 0 {
			t.Fatal("the front is not in order")
		}
	}
}

// BenchmarkGenetic is the driver's own cost: the problem costs next to nothing.
func BenchmarkGenetic(b *testing.B) {
	for _, p := range []*tp.Problem{tp.ZDT1(), tp.BNH(), tp.DTLZ2()} {
		b.Run(p.Name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				set := optimize.Settings{Evaluations: 10_000, Seed: 1}
				if _, err := optimize.Run(context.Background(), p, set, nil, nil); err != nil {
					b.Fatal(err)
				}
			}
			b.ReportMetric(b.Elapsed().Seconds()*100/float64(b.N), "ms/1000evals")
		})
	}
}
