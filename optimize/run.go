package optimize

import (
	"context"
	"errors"
	"fmt"
	"math"
)

// Driver says how a run searches.
type Driver uint8

const (
	Genetic Driver = iota // generations, one to three aims
	Simplex               // Nelder-Mead simplexes in lock-step, one aim
)

// String is the driver's name in messages.
func (d Driver) String() string {
	switch d {
	case Genetic:
		return "genetic"
	case Simplex:
		return "simplex"
	}
	return fmt.Sprintf("driver %d", uint8(d))
}

// Settings say how long and by which driver to search. Driver, Seed and Population are part of what a run
// is; Evaluations and Workers are not.
type Settings struct {
	Evaluations int    // budget of designs, > 0; a larger one continues the same run
	Seed        uint64 // any number
	Workers     int    // goroutines that evaluate; below 1 means 1; does not change the result
	Population  int    // designs per generation, or simplexes side by side; 0 means the driver's default
	Driver      Driver
}

// Progress tells how far a run is. Observers get one after every batch.
type Progress struct {
	Evaluations int     // designs asked for so far, recalled ones included
	Feasible    int     // of these, that meet all limits
	Failed      int     // of these, that have a cause
	Duplicates  int     // repeated designs, answered without an evaluation and not counted above
	Recalled    int     // of Evaluations, those answered by the ledger
	Hypervolume float64 // of the front so far from Problem.Reference, in the aims' units multiplied
	Front       int     // designs on the front so far
	Generation  int     // batches so far
}

// CauseCount is a cause of failure and how many designs had it.
type CauseCount struct {
	Cause string
	Count int
}

// HistoryRow is the state after one batch. Rows do not depend on the budget, but for the last.
type HistoryRow struct {
	Evaluations int
	Feasible    int
	Front       int
	Hypervolume float64
}

// Result is what a run found. It does not depend on the workers, on the ledger, or on interruptions.
type Result struct {
	Front    []Point // non-dominated designs that meet all limits, ascending by F; of equal F the first found
	FrontSeq []int   // sequence number of each design of Front

	Evaluations int
	Feasible    int
	Failed      int
	Duplicates  int
	Failures    []CauseCount // by count, largest first, then by cause
	Hypervolume float64      // of Front from Problem.Reference
	History     []HistoryRow

	// LeastViolation is, while no design meets all limits, the one that comes nearest: the smallest sum of
	// what the limits are exceeded by. It is nil when Front is not empty and when every design failed.
	LeastViolation    *Point
	LeastViolationSeq int

	// Exhausted says that the search ended before its budget because there was no further design to try.
	Exhausted bool
}

// Run searches the problem until the budget is used up, no further design is left, or ctx ends. ledger and
// observe may be nil. observe is called from the calling goroutine and must not keep it long.
//
// The ledger is written in a goroutine beside the search, which goes on meanwhile; when Run returns, all that
// it reports is recorded. A ledger that fails ends the run.
//
// When ctx ends, designs under evaluation are finished and recorded, and Run returns what was found so far
// together with the context's error. Other errors come with a nil result: errors of the ledger, an
// ErrLedgerMismatch, an ErrProblem.
func Run(ctx context.Context, p Problem, s Settings, ledger Ledger, observe func(Progress)) (*Result, error) {
	sp, err := newSpace(p)
	if err != nil {
		return nil, err
	}
	if s.Evaluations <= 0 {
		return nil, fmt.Errorf("%w: budget of %d evaluations", ErrProblem, s.Evaluations)
	}
	if s.Population < 0 {
		return nil, fmt.Errorf("%w: population of %d", ErrProblem, s.Population)
	}
	run := newSession(ctx, p, sp, s, ledger, observe)
	defer func() { _ = run.close() }() // for a panic; its error is looked at below
	switch s.Driver {
	case Genetic:
		err = runGenetic(run, s)
	case Simplex:
		if p.Aims() != 1 {
			return nil, fmt.Errorf("%w: the simplex driver takes one aim, not %d", ErrProblem, p.Aims())
		}
		err = runSimplex(run, s)
	default:
		return nil, fmt.Errorf("%w: unknown %v", ErrProblem, s.Driver)
	}
	if failed := run.close(); failed != nil {
		return nil, failed
	}
	switch {
	case errors.Is(err, errBudget):
		return run.result(false), nil
	case errors.Is(err, errExhausted):
		return run.result(true), nil
	case ctx.Err() != nil && errors.Is(err, ctx.Err()):
		return run.result(false), err
	case err != nil:
		return nil, err
	}
	return run.result(false), nil
}

// checkProblem finds contradictions in a problem.
func checkProblem(p Problem) error {
	fail := func(format string, args ...any) error {
		return fmt.Errorf("%w: %s", ErrProblem, fmt.Sprintf(format, args...))
	}
	vars := p.Variables()
	if len(vars) == 0 {
		return fail("no variables")
	}
	for _, v := range vars {
		switch {
		case v.Kind > Choice:
			return fail("variable %s: unknown kind %d", v.Name, v.Kind)
		case math.IsNaN(v.Low) || math.IsInf(v.Low, 0) || math.IsNaN(v.High) || math.IsInf(v.High, 0) || v.Low > v.High:
			return fail("variable %s: bounds %v and %v", v.Name, v.Low, v.High)
		case math.IsInf(v.High-v.Low, 0):
			return fail("variable %s: bounds %v and %v are too far apart", v.Name, v.Low, v.High)
		case v.Kind != Real && (v.Low != math.Trunc(v.Low) || v.High != math.Trunc(v.High)):
			return fail("variable %s: bounds %v and %v of whole numbers", v.Name, v.Low, v.High)
		}
	}
	if p.Aims() < 1 || p.Aims() > 3 {
		return fail("%d aims, must be 1 to 3", p.Aims())
	}
	if p.Limits() < 0 || p.Extras() < 0 {
		return fail("%d limits, %d extras", p.Limits(), p.Extras())
	}
	if ref := p.Reference(); len(ref) != p.Aims() {
		return fail("reference of %d numbers for %d aims", len(ref), p.Aims())
	}
	for i, r := range p.Reference() {
		if math.IsNaN(r) || math.IsInf(r, 0) {
			return fail("reference of aim %d is %v", i, r)
		}
	}
	for i, x := range p.Start() {
		if len(x) != len(vars) {
			return fail("start design %d has %d numbers for %d variables", i, len(x), len(vars))
		}
		for k, v := range vars {
			if !(x[k] >= v.Low && x[k] <= v.High) {
				return fail("start design %d: %s = %v is outside %v to %v", i, v.Name, x[k], v.Low, v.High)
			}
			if v.Kind != Real && x[k] != math.Trunc(x[k]) {
				return fail("start design %d: %s = %v is not a whole number", i, v.Name, x[k])
			}
		}
	}
	return nil
}
