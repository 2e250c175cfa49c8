package optimize

import (
	"cmp"
	"context"
	"encoding/binary"
	"fmt"
	"math"
	"slices"

	"hotfront/optimize/batch"
	"hotfront/optimize/pareto"
)

const (
	errBudget    = Error("optimize: budget used up")
	errExhausted = Error("optimize: no further design to try")
)

// session is one run's bookkeeping: it answers batches of designs from the cache, the ledger or the pool,
// in this order, numbers them, and keeps the front. Drivers see nothing of where an answer came from.
type session struct {
	problem Problem
	space   *space
	budget  int
	ledger  Ledger
	live    bool // the ledger holds nothing beyond what was recalled
	observe func(Progress)
	pool    *batch.Pool[Point]

	points    []Point // every design by sequence number
	violation []float64
	known     map[string]int // sequence number by key of X
	key       []byte
	archive   *pareto.Archive
	ref       []float64
	stale     bool // hypervolume must be computed anew
	causes    map[string]int
	nearest   int // sequence number of the least violation, -1 for none
	progress  Progress
	history   []HistoryRow
}

func newSession(p Problem, sp *space, s Settings, ledger Ledger, observe func(Progress)) *session {
	aims, limits := p.Aims(), p.Limits()
	return &session{
		problem: p, space: sp, budget: s.Evaluations, ledger: ledger, live: ledger == nil, observe: observe,
		pool: batch.NewPool(s.Workers, func() func(*Point) {
			evaluator := p.NewEvaluator()
			return func(point *Point) {
				evaluator.Evaluate(point)
				vet(point, aims, limits)
			}
		}, fail),
		known:   map[string]int{},
		archive: pareto.NewArchive(aims),
		ref:     p.Reference(),
		causes:  map[string]int{},
		nearest: -1,
	}
}

// fail marks a point as failed. What an evaluator left in its numbers means nothing any more.
func fail(p *Point, cause string) {
	p.Cause = cause
	clear(p.F)
	clear(p.G)
	clear(p.Extra)
}

// vet turns results that cannot be compared or stored into a cause.
func vet(p *Point, aims, limits int) {
	if p.Cause != "" {
		return
	}
	if len(p.F) != aims || len(p.G) != limits {
		panic("optimize: evaluator changed the number of aims or limits")
	}
	for i, v := range p.F {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			fail(p, fmt.Sprintf("aim %d is %v", i+1, v))
			return
		}
	}
	for i, v := range p.G {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			fail(p, fmt.Sprintf("limit %d is %v", i+1, v))
			return
		}
	}
	for i, v := range p.Extra {
		if math.IsNaN(v) || math.IsInf(v, 0) {
			fail(p, fmt.Sprintf("extra %d is %v", i+1, v))
			return
		}
	}
}

// lookup is the sequence number of a design asked for before.
func (s *session) lookup(x []float64) (int, bool) {
	s.key = s.key[:0]
	for _, v := range x {
		s.key = binary.LittleEndian.AppendUint64(s.key, math.Float64bits(v+0)) // -0 is 0
	}
	seq, found := s.known[string(s.key)]
	return seq, found
}

// evaluate answers the designs xs, writing the sequence number of each to seqs. It keeps the slices of xs.
// When the budget or the context ends inside the batch it keeps what it has and returns errBudget or the
// context's error.
func (s *session) evaluate(ctx context.Context, xs [][]float64, seqs []int) error {
	first := len(s.points)
	for i, x := range xs {
		if seq, found := s.lookup(x); found {
			seqs[i] = seq
			s.progress.Duplicates++
			continue
		}
		seqs[i] = len(s.points)
		s.known[string(s.key)] = seqs[i]
		p := NewPoint(s.problem)
		p.X = x
		s.points = append(s.points, p)
	}
	var stop error
	if s.budget < len(s.points) {
		s.forget(max(first, s.budget))
		stop = errBudget
	}
	if done, err := s.answer(ctx, first); err != nil {
		return err
	} else if done < len(s.points) {
		s.forget(done)
		stop = ctx.Err()
	}
	s.account(first)
	return stop
}

// forget takes back the numbers from seq on.
func (s *session) forget(seq int) {
	for _, p := range s.points[seq:] {
		s.lookup(p.X)
		delete(s.known, string(s.key))
	}
	s.points = s.points[:seq]
}

// answer fills the points from first on and returns the number up to which they are filled and durable.
func (s *session) answer(ctx context.Context, first int) (int, error) {
	todo := s.points[first:]
	recalled := 0
	if !s.live && len(todo) > 0 {
		dst := make([]Point, len(todo))
		for i := range dst {
			dst[i] = NewPoint(s.problem)
		}
		n, err := s.ledger.Recall(first, dst)
		if err != nil {
			return 0, fmt.Errorf("optimize: recall designs from %d: %w", first, err)
		}
		if n < 0 || n > len(dst) {
			panic("optimize: ledger recalled more points than asked for")
		}
		for i := range n {
			if err := s.match(first+i, &todo[i], &dst[i]); err != nil {
				return 0, err
			}
			dst[i].X = todo[i].X
			todo[i] = dst[i]
		}
		s.progress.Recalled += n
		s.live = n < len(dst)
		recalled = n
	}
	done := first + recalled
	if n := s.pool.Run(ctx, todo[recalled:]); n > 0 {
		if s.ledger != nil {
			if err := s.ledger.Record(done, todo[recalled:recalled+n]); err != nil {
				return 0, fmt.Errorf("optimize: record designs from %d: %w", done, err)
			}
		}
		done += n
	}
	return done, nil
}

// match compares the stored point with the one asked for, bit by bit.
func (s *session) match(seq int, asked, stored *Point) error {
	if len(stored.X) != len(asked.X) || len(stored.F) != len(asked.F) ||
		len(stored.G) != len(asked.G) || len(stored.Extra) != len(asked.Extra) {
		return &MismatchError{Seq: seq}
	}
	for k, x := range asked.X {
		if math.Float64bits(x) != math.Float64bits(stored.X[k]) {
			return &MismatchError{Seq: seq, Variable: s.space.vars[k].Name, Stored: stored.X[k], Asked: x}
		}
	}
	return nil
}

// account takes the points from first on into the counts and the front.
func (s *session) account(first int) {
	for seq := first; seq < len(s.points); seq++ {
		p := &s.points[seq]
		if p.Cause != "" {
			s.violation = append(s.violation, math.Inf(1))
			s.progress.Failed++
			s.causes[p.Cause]++
			continue
		}
		v := pareto.Violation(p.G)
		s.violation = append(s.violation, v)
		if s.nearest < 0 || v < s.violation[s.nearest] {
			s.nearest = seq
		}
		if v > 0 {
			continue
		}
		s.progress.Feasible++
		taken, err := s.archive.Add(p.F, seq)
		if err != nil {
			panic(err) // vet lets no NaN through
		}
		s.stale = s.stale || taken
	}
	if s.stale {
		s.progress.Hypervolume = s.archive.Hypervolume(s.ref)
		s.stale = false
	}
	s.progress.Evaluations = len(s.points)
	s.progress.Front = s.archive.Len()
	s.progress.Generation++
	if len(s.points) > first {
		s.history = append(s.history, HistoryRow{
			Evaluations: len(s.points),
			Feasible:    s.progress.Feasible,
			Front:       s.progress.Front,
			Hypervolume: s.progress.Hypervolume,
		})
	}
	if s.observe != nil {
		s.observe(s.progress)
	}
}

// result sums up the session. The points' slices are shared with nothing that will change.
func (s *session) result(exhausted bool) *Result {
	r := &Result{
		Evaluations: s.progress.Evaluations,
		Feasible:    s.progress.Feasible,
		Failed:      s.progress.Failed,
		Duplicates:  s.progress.Duplicates,
		Hypervolume: s.progress.Hypervolume,
		History:     s.history,
		Exhausted:   exhausted,

		LeastViolationSeq: -1,
	}
	for i := range s.archive.Len() {
		seq := s.archive.At(i).Tag
		r.Front = append(r.Front, s.points[seq])
		r.FrontSeq = append(r.FrontSeq, seq)
	}
	if len(r.Front) == 0 && s.nearest >= 0 {
		p := s.points[s.nearest]
		r.LeastViolation, r.LeastViolationSeq = &p, s.nearest
	}
	for cause, count := range s.causes {
		r.Failures = append(r.Failures, CauseCount{Cause: cause, Count: count})
	}
	slices.SortFunc(r.Failures, func(a, b CauseCount) int {
		return cmp.Or(cmp.Compare(b.Count, a.Count), cmp.Compare(a.Cause, b.Cause))
	})
	return r
}
