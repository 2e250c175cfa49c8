package optimize

import (
	"context"
	"errors"
	"fmt"
	"math"

	"hotfront/optimize/pareto"
)

// PolishSettings say how to polish a design. Evaluations and Workers change nothing but where it stops and
// how fast it is.
type PolishSettings struct {
	Evaluations int       // budget of designs, > 0
	Workers     int       // goroutines that evaluate; below 1 means 1
	Simplexes   int       // simplexes side by side; 0 means 4
	Scale       []float64 // what counts as much in each aim, > 0, such as the front's extent; nil: the design's own aims
}

// Polished is what polishing found.
type Polished struct {
	Point       Point // the best design; the given one if nothing beat it
	Seq         int   // its sequence number in this polish; 0 is the given design
	Improved    bool
	Evaluations int
}

// along is the weight of the sum of all aims beside the worst one; it keeps an improvement in one aim from
// counting for nothing.
const along = 1e-3

// Polish improves one design of a front in all aims at once by Nelder-Mead, from simplexes of different size
// around it. It minimises the achievement
//
//	a(f) = max_k d_k + 0.001 sum_k d_k,   d_k = (f_k - f0_k) / scale_k
//
// where f0 are the aims of the given design; a < 0 means better in every aim. Limits are treated as by the
// simplex driver.
//
// The result is never worse than the given design: it is a design that beats it, feasible first, and among
// these the one with the lowest achievement; else the given design. When ctx ends, Polish returns what it has
// with the context's error. The ledger, which may be nil, must be one of this polish alone.
//
// Source: A. P. Wierzbicki, The use of reference objectives in multiobjective optimization, Springer LNEMS
// 177 (1980) 468-486.
func Polish(ctx context.Context, p Problem, from Point, set PolishSettings, ledger Ledger) (*Polished, error) {
	sp, err := newSpace(startAt{p, from.X})
	if err != nil {
		return nil, err
	}
	if set.Evaluations <= 0 || set.Simplexes < 0 {
		return nil, fmt.Errorf("%w: budget of %d evaluations, %d simplexes", ErrProblem, set.Evaluations, set.Simplexes)
	}
	count := set.Simplexes
	if count == 0 {
		count = defaultSimplexes
	}
	if set.Scale != nil && len(set.Scale) != p.Aims() {
		return nil, fmt.Errorf("%w: %d scales for %d aims", ErrProblem, len(set.Scale), p.Aims())
	}
	for k, v := range set.Scale {
		if !(v > 0) || math.IsInf(v, 1) {
			return nil, fmt.Errorf("%w: scale %v of aim %d", ErrProblem, v, k)
		}
	}
	s := newSession(ctx, p, sp, Settings{Evaluations: set.Evaluations, Workers: set.Workers}, ledger, nil)
	defer func() { _ = s.close() }() // for a panic; its error is looked at below
	s.keepAll = true

	c := newCrowd(s, nil)
	c.scalar = func(f []float64) float64 { return achievement(f, s.memo.aimsOf(0), set.Scale) }
	first := &vertex{u: make([]float64, sp.dims()), x: sp.start[0]}
	sp.encode(first.u, first.x)
	err = c.answer([]*vertex{first})
	if err == nil {
		size := beginSize
		for range count {
			c.add(first, size)
			size *= againFactor
		}
		err = c.run(nil)
	}
	if failed := s.close(); failed != nil {
		return nil, failed
	}
	switch {
	case errors.Is(err, errBudget), errors.Is(err, errExhausted):
		err = nil
	case ctx.Err() == nil || !errors.Is(err, ctx.Err()):
		return nil, err
	}
	out := &Polished{Point: from, Evaluations: s.counted}
	if s.counted == 0 {
		return out, err
	}
	out.Point = s.wholePoint(0)
	base := s.memo.aimsOf(0)
	best, bestMerit := 0, math.Inf(1)
	for i := range s.counted {
		f, violation := s.memo.aimsOf(i), s.memo.violationOf(i)
		if !pareto.Beats(f, violation, base, s.memo.violationOf(0)) {
			continue
		}
		m := wall(achievement(f, base, set.Scale), violation)
		if m < bestMerit {
			best, bestMerit = i, m
		}
	}
	if best > 0 {
		out.Point, out.Seq, out.Improved = s.wholePoint(best), best, true
	}
	return out, err
}

// achievement is how much worse f is than base, in scales.
func achievement(f, base, scale []float64) float64 {
	worst, sum := math.Inf(-1), 0.0
	for k, v := range f {
		s := math.Abs(base[k])
		if scale != nil {
			s = scale[k]
		}
		if s == 0 {
			s = 1
		}
		d := (v - base[k]) / s
		worst = max(worst, d)
		sum += d
	}
	return worst + along*sum
}

// startAt is a problem with one start design of its own.
type startAt struct {
	Problem
	x []float64
}

// Start lists the one design.
func (s startAt) Start() [][]float64 { return [][]float64{s.x} }
