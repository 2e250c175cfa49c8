package batch

import (
	"context"
	"runtime"
	"sync"
)

// Stream works through items that are put one after another, also while earlier ones are worked on. Items are
// begun in the order in which they were put, and what is done when the context ends is the beginning of them.
// Its methods are called from one goroutine.
type Stream[T any] struct {
	ctx       context.Context
	newWorker func() func(*T)
	failed    func(item *T, cause string)
	most      int // workers
	started   int
	wg        sync.WaitGroup

	mu      sync.Mutex
	work    sync.Cond // workers wait for items
	ready   sync.Cond // Wait waits for results
	items   []*T      // from number base on; nil once done
	base    int       // number of items[0]; all before are done
	next    int       // number of the first item not begun
	done    int       // all items before this number are done
	running int       // items begun and not done
	idle    int       // workers that wait
	wanted  int       // what Wait waits for, 0 for nothing
	closed  bool
}

// NewStream makes a stream of at most so many workers, at least one; newWorker and failed are as for NewPool.
// Close must be called.
func NewStream[T any](ctx context.Context, workers int, newWorker func() func(*T), failed func(item *T, cause string)) *Stream[T] {
	s := &Stream[T]{ctx: ctx, newWorker: newWorker, failed: failed, most: max(1, workers)}
	s.work.L, s.ready.L = &s.mu, &s.mu
	return s
}

// Put hands items over. They must not be touched before they are done.
func (s *Stream[T]) Put(items ...*T) {
	s.mu.Lock()
	s.items = append(s.items, items...)
	left := s.base + len(s.items) - s.next
	fresh := min(max(0, left-s.idle), s.most-s.started)
	for range min(left, s.idle) {
		s.work.Signal()
	}
	s.mu.Unlock()
	for range fresh {
		do := s.newWorker()
		s.started++
		s.wg.Go(func() { s.loop(do) })
	}
}

// Wait waits until the first n items put are done, and returns how many are, which may be more. When the
// context has ended it waits only for the items that have begun, and may return less than n.
func (s *Stream[T]) Wait(n int) int {
	s.mu.Lock()
	defer s.mu.Unlock()
	for s.done < n && (s.running > 0 || s.ctx.Err() == nil) {
		s.wanted = n
		s.ready.Wait()
	}
	s.wanted = 0
	s.shift()
	return s.done
}

// Close ends the workers; items that have begun are finished, others are left.
func (s *Stream[T]) Close() {
	s.mu.Lock()
	s.closed = true
	s.work.Broadcast()
	s.mu.Unlock()
	s.wg.Wait()
}

// loop is a worker.
func (s *Stream[T]) loop(do func(*T)) {
	s.mu.Lock()
	defer s.mu.Unlock()
	for !s.closed {
		if s.ctx.Err() != nil {
			s.ready.Signal() // nothing more will be begun
			return
		}
		if s.next == s.base+len(s.items) {
			s.idle++
			s.work.Wait()
			s.idle--
			continue
		}
		at := s.next
		item := s.items[at-s.base]
		s.next++
		s.running++
		s.mu.Unlock()
		if !attempt(do, item, s.failed) {
			do = s.newWorker()
		}
		s.mu.Lock()
		s.running--
		s.items[at-s.base] = nil
		for s.done < s.next && s.items[s.done-s.base] == nil {
			s.done++
		}
		if s.wanted > 0 && s.done >= s.wanted {
			s.wanted = 0
			s.ready.Signal()
			// Where all processors are taken by workers, who waits would not come to its turn before one of
			// them runs dry.
			s.mu.Unlock()
			runtime.Gosched()
			s.mu.Lock()
		}
	}
}

// shift lets go of the places of what is done.
func (s *Stream[T]) shift() {
	n := copy(s.items, s.items[s.done-s.base:])
	clear(s.items[n:])
	s.items = s.items[:n]
	s.base = s.done
}

// attempt does one item and turns a panic into a failed item, of which it reports false.
func attempt[T any](do func(*T), item *T, failed func(*T, string)) (ok bool) {
	defer func() {
		if r := recover(); r != nil {
			failed(item, panicked(r))
		}
	}()
	do(item)
	return true
}
