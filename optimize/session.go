package optimize

import (
	"cmp"
	"context"
	"fmt"
	"math"
	"slices"
	"time"

	"hotfront/optimize/batch"
	"hotfront/optimize/pareto"
)

const (
	errBudget    = Error("optimize: budget used up")
	errExhausted = Error("optimize: no further design to try")
)

// session is one run's bookkeeping: it answers designs from the cache, the ledger or the workers, in this
// order, numbers them, and keeps the front. Drivers see nothing of where an answer came from.
//
// Designs are asked for ahead of their answers (ask), and are taken into account in the order of their numbers
// when a driver waits for them (await), so that the outcome does not depend on when an answer comes. The
// ledger is written beside that.
type session struct {
	problem Problem
	space   *space
	budget  int
	ledger  Ledger
	live    bool // the ledger holds nothing beyond what was recalled
	observe func(Progress)
	ctx     context.Context
	stream  *batch.Stream[Point]
	record  *batch.Line[Point] // nil without a ledger
	dims    int
	aims    int
	limits  int
	extras  int

	memo     *memo
	recalled int         // designs up to this number came from the ledger, the others went to the stream
	open     []*Point    // designs asked for and not yet taken into account
	settled  int         // designs up to this number have their aims and violation in the memo
	spare    [][]float64 // room for further results
	done     []Point     // workspace of account
	counted  int         // designs up to this number are taken into account; open[0] is this one
	keepAll  bool        // keep every point whole
	whole    map[int]Point
	archive  *pareto.Archive
	causes   map[string]int
	nearest  int       // sequence number of the least violation, -1 for none
	reach    []float64 // least number of each limit, while no design meets all
	progress Progress
	history  []HistoryRow
}

const (
	// recordAhead is the most designs that may wait for the ledger before the search waits for it.
	recordAhead = 1 << 12
	// recordPause is how long designs gather between two calls of the ledger: long against what making sure of a
	// disk costs, short against what anybody minds losing by a power cut.
	recordPause = 100 * time.Millisecond
)

// newSession begins a session. It must be closed.
func newSession(ctx context.Context, p Problem, sp *space, s Settings, ledger Ledger, observe func(Progress)) *session {
	aims, limits := p.Aims(), p.Limits()
	run := &session{
		problem: p, space: sp, budget: s.Evaluations, ledger: ledger, live: ledger == nil, observe: observe, ctx: ctx,
		stream: batch.NewStream(ctx, s.Workers, func() func(*Point) {
			evaluator := p.NewEvaluator()
			return func(point *Point) {
				evaluator.Evaluate(point)
				vet(point, aims, limits)
			}
		}, fail),
		dims: sp.dims(), aims: aims, limits: limits, extras: p.Extras(),
		memo:    newMemo(sp.dims(), aims),
		whole:   map[int]Point{},
		archive: pareto.NewArchive(aims),
		causes:  map[string]int{},
		nearest: -1,
	}
	run.archive.Measure(p.Reference())
	for range limits {
		run.reach = append(run.reach, math.Inf(1))
	}
	if ledger != nil {
		next := -1
		run.record = batch.NewLine(recordAhead, recordPause, func(points []Point) error {
			if next < 0 {
				next = run.recalled
			}
			if err := ledger.Record(next, points); err != nil {
				return fmt.Errorf("optimize: record designs from %d: %w", next, err)
			}
			next += len(points)
			return nil
		})
	}
	return run
}

// close ends the session and makes sure of what it has recorded. It may be called again.
func (s *session) close() error {
	s.stream.Close()
	if s.record == nil {
		return nil
	}
	err := s.record.Close()
	s.record = nil
	return err
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
		if v-v != 0 { // NaN or infinite
			fail(p, fmt.Sprintf("aim %d is %v", i+1, v))
			return
		}
	}
	for i, v := range p.G {
		if v-v != 0 { // NaN or infinite
			fail(p, fmt.Sprintf("limit %d is %v", i+1, v))
			return
		}
	}
	for i, v := range p.Extra {
		if v-v != 0 { // NaN or infinite
			fail(p, fmt.Sprintf("extra %d is %v", i+1, v))
			return
		}
	}
}

// lookup is the sequence number of a design asked for before.
func (s *session) lookup(x []float64) (int, bool) { return s.memo.find(x) }

// asked is the number of designs asked for.
func (s *session) asked() int { return s.memo.n }

// ask hands the designs xs to the workers, writing the sequence number of each to seqs, and returns the number
// to await for all of them. It does not keep xs. Designs beyond the budget are not asked for; whoever awaits
// them gets errBudget.
func (s *session) ask(xs [][]float64, seqs []int) (upto int, err error) {
	first := s.memo.n
	beyond := 0
	for i, x := range xs {
		if s.memo.n == s.budget {
			if seq, found := s.memo.find(x); found {
				seqs[i] = seq
				s.progress.Duplicates++
				continue
			}
			seqs[i] = s.budget + beyond
			beyond++
			continue
		}
		var fresh bool
		if seqs[i], fresh = s.memo.add(x); !fresh {
			s.progress.Duplicates++
		}
	}
	upto = s.memo.n + beyond
	fresh := s.memo.n - first
	if fresh == 0 {
		return upto, nil
	}
	points := make([]Point, fresh)
	room := make([]float64, fresh*s.limits)
	for i := range points {
		points[i] = Point{X: s.memo.at(first + i), F: s.memo.aimsOf(first + i), G: room[:s.limits:s.limits], Extra: s.extra()}
		room = room[s.limits:]
		s.open = append(s.open, &points[i])
	}
	n := 0
	if !s.live {
		if n, err = s.recall(first, points); err != nil {
			return 0, err
		}
	}
	if s.live {
		s.stream.Put(s.open[len(s.open)-fresh+n:]...)
	}
	return upto, nil
}

// extra is room for further results, all zero.
func (s *session) extra() []float64 {
	n := len(s.spare)
	if n == 0 {
		return make([]float64, s.extras)
	}
	room := s.spare[n-1]
	s.spare = s.spare[:n-1]
	clear(room)
	return room
}

// recall takes the beginning of the points from the ledger and returns how many.
func (s *session) recall(first int, points []Point) (int, error) {
	dst := make([]Point, len(points))
	for i := range dst {
		dst[i] = Point{X: make([]float64, s.dims), F: make([]float64, s.aims), G: points[i].G, Extra: points[i].Extra}
	}
	n, err := s.ledger.Recall(first, dst)
	if err != nil {
		return 0, fmt.Errorf("optimize: recall designs from %d: %w", first, err)
	}
	if n < 0 || n > len(dst) {
		panic("optimize: ledger recalled more points than asked for")
	}
	for i := range n {
		if err := s.match(first+i, &points[i], &dst[i]); err != nil {
			return 0, err
		}
		p := &points[i]
		copy(p.F, dst[i].F)
		p.G, p.Extra, p.Cause = dst[i].G, dst[i].Extra, dst[i].Cause
	}
	s.progress.Recalled += n
	s.recalled += n
	s.live = n < len(dst)
	return n, nil
}

// match compares the stored point with the one asked for, bit by bit. Its further results may not be stored.
func (s *session) match(seq int, asked, stored *Point) error {
	if len(stored.X) != len(asked.X) || len(stored.F) != len(asked.F) ||
		len(stored.G) != len(asked.G) || stored.Extra != nil && len(stored.Extra) != s.extras {
		return &MismatchError{Seq: seq}
	}
	for k, x := range asked.X {
		if math.Float64bits(x) != math.Float64bits(stored.X[k]) {
			return &MismatchError{Seq: seq, Variable: s.space.vars[k].Name, Stored: stored.X[k], Asked: x}
		}
	}
	return nil
}

// settle waits until the aims and violations of the designs up to a number are in the memo. When the context
// ends before, it takes into account what there is, forgets the rest and returns the context's error.
func (s *session) settle(upto int) error {
	upto = min(upto, s.memo.n)
	if upto <= s.settled {
		return nil
	}
	done := upto
	if upto > s.recalled {
		done = s.recalled + s.stream.Wait(upto-s.recalled)
	}
	for ; s.settled < done; s.settled++ {
		p := s.open[s.settled-s.counted]
		v := math.Inf(1)
		if p.Cause == "" {
			v = pareto.Violation(p.G)
		}
		copy(s.memo.aimsOf(s.settled), p.F) // the same, unless an evaluator has put a slice of its own there
		s.memo.setViolation(s.settled, v)
	}
	if done >= upto {
		return nil
	}
	s.memo.drop(done)
	s.open = s.open[:done-s.counted]
	if err := s.account(done); err != nil {
		return err
	}
	return s.ctx.Err()
}

// await waits for the designs up to a number and takes them into account. Beyond the budget it returns
// errBudget with all that is within it; for the context's end see settle.
func (s *session) await(upto int) error {
	if err := s.settle(upto); err != nil {
		return err
	}
	if err := s.account(min(upto, s.memo.n)); err != nil {
		return err
	}
	if upto > s.budget {
		return errBudget
	}
	return nil
}

// evaluate asks for designs and awaits them.
func (s *session) evaluate(xs [][]float64, seqs []int) error {
	upto, err := s.ask(xs, seqs)
	if err != nil {
		return err
	}
	return s.await(upto)
}

// account takes the settled designs up to a number into the counts and the front, and has them recorded.
func (s *session) account(upto int) error {
	begin := s.counted
	if upto <= begin {
		return nil
	}
	points := s.done[:0]
	for ; s.counted < upto; s.counted++ {
		p := *s.open[s.counted-begin]
		used := s.take(s.counted, &p) || s.keepAll
		if used && p.Extra == nil && s.extras > 0 {
			return &MismatchError{Seq: s.counted} // a run like this one would have stored them
		}
		// The room of the further results is for the next designs; what is still to be recorded is held apart.
		room := p.Extra
		if !used {
			p.Extra = nil
		} else if held, ok := s.whole[s.counted]; ok {
			p.Extra = held.Extra
		} else {
			p.Extra = slices.Clone(p.Extra)
		}
		if len(room) > 0 {
			s.spare = append(s.spare, room)
		}
		points = append(points, p)
	}
	s.done = points
	s.open = slices.Delete(s.open, 0, s.counted-begin)
	if s.record != nil && s.counted > s.recalled {
		if err := s.record.Put(points[max(0, s.recalled-begin):]); err != nil {
			return err
		}
	}
	s.progress.Hypervolume = s.archive.Measured()
	s.progress.Evaluations = s.counted
	s.progress.Front = s.archive.Len()
	s.progress.Generation++
	s.history = append(s.history, HistoryRow{
		Evaluations: s.counted,
		Feasible:    s.progress.Feasible,
		Front:       s.progress.Front,
		Hypervolume: s.progress.Hypervolume,
	})
	if s.observe != nil {
		s.observe(s.progress)
	}
	return nil
}

// take takes one design into the counts and the front, and reports whether its further results are of use:
// when it is on the front as of now, and while no design meets all limits, when it comes nearer than any
// before to all of them or to one of them. This depends on the designs up to this one alone, so that a run that
// goes on, from whatever place, has stored the same.
func (s *session) take(seq int, p *Point) bool {
	if s.keepAll {
		s.hold(seq, p)
	}
	if p.Cause != "" {
		s.progress.Failed++
		s.causes[p.Cause]++
		return false
	}
	v := s.memo.violationOf(seq)
	use := false
	if v > 0 && s.progress.Feasible == 0 {
		for k, g := range p.G {
			if g < s.reach[k] {
				s.reach[k], use = g, true
			}
		}
		if s.nearest < 0 || v < s.memo.violationOf(s.nearest) {
			s.let(s.nearest)
			s.nearest, use = seq, true
			s.hold(seq, p)
		}
	}
	if v > 0 {
		return use
	}
	s.progress.Feasible++
	s.let(s.nearest)
	s.nearest = -1
	taken, err := s.archive.Add(p.F, seq)
	if err != nil {
		panic(err) // vet lets no NaN through
	}
	if taken {
		s.hold(seq, p)
		for _, tag := range s.archive.Left() {
			s.let(tag)
		}
	}
	return taken
}

// hold keeps a point whole, in slices of its own: those that it was answered in are used again or belong to a
// whole batch.
func (s *session) hold(seq int, p *Point) {
	room := append(make([]float64, 0, len(p.G)+len(p.Extra)), p.G...)
	room = append(room, p.Extra...)
	n := len(p.G)
	s.whole[seq] = Point{X: p.X, F: p.F, G: room[:n:n], Extra: room[n:], Cause: p.Cause}
}

// wholePoint is a point held, in slices that do not keep the memo alive.
func (s *session) wholePoint(seq int) Point {
	p := s.whole[seq]
	p.X, p.F = slices.Clone(p.X), slices.Clone(p.F)
	return p
}

// let lets go of the numbers of a design that is neither on the front nor the nearest any more.
func (s *session) let(seq int) {
	if !s.keepAll && seq >= 0 {
		delete(s.whole, seq)
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
		r.Front = append(r.Front, s.wholePoint(seq))
		r.FrontSeq = append(r.FrontSeq, seq)
	}
	if len(r.Front) == 0 && s.nearest >= 0 {
		p := s.wholePoint(s.nearest)
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
