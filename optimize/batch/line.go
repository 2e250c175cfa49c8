package batch

import (
	"sync"
	"time"
)

// Line hands items to one goroutine that works through them in order, as many at a time as have gathered: what
// takes long for each call, such as making sure of a disk, does not hold up who puts them. Its methods are
// called from one goroutine.
type Line[T any] struct {
	most  int
	pause time.Duration
	work  func([]T) error
	wait  func()

	mu      sync.Mutex
	changed sync.Cond
	waiting []T
	busy    bool
	resting bool // since the call before, for the pause
	hurried bool // somebody waits for the items
	closed  bool
	err     error
}

// NewLine makes a line in which at most so many items wait before Put waits too. After a call of work items
// gather for the given pause, unless somebody waits for them: it bounds what the calls cost, and is how
// long an item may lie here. work must not keep its slice. After its first error it is not
// called again. Close must be called.
func NewLine[T any](most int, pause time.Duration, work func([]T) error) *Line[T] {
	l := &Line[T]{most: most, pause: pause, work: work}
	l.changed.L = &l.mu
	l.wait = Beside(l.loop)
	return l
}

// Put takes items to be worked on. It returns the first error of work so far.
func (l *Line[T]) Put(items []T) error {
	l.mu.Lock()
	defer l.mu.Unlock()
	for l.err == nil && len(l.waiting) > l.most {
		l.changed.Wait()
	}
	if l.err == nil {
		l.waiting = append(l.waiting, items...)
		if !l.resting || len(l.waiting) > l.most { // else the end of the rest wakes the goroutine
			l.changed.Broadcast()
		}
	}
	return l.err
}

// Flush waits until all items have been worked on, or work has failed, and returns its error.
func (l *Line[T]) Flush() error {
	l.mu.Lock()
	defer l.mu.Unlock()
	l.hurried = true
	l.changed.Broadcast()
	for l.err == nil && (l.busy || len(l.waiting) > 0) {
		l.changed.Wait()
	}
	l.hurried = false
	return l.err
}

// Close flushes and ends the goroutine.
func (l *Line[T]) Close() error {
	err := l.Flush()
	l.mu.Lock()
	l.closed = true
	l.changed.Broadcast()
	l.mu.Unlock()
	l.wait()
	return err
}

func (l *Line[T]) loop() {
	var items []T
	l.mu.Lock()
	defer l.mu.Unlock()
	for {
		for !l.closed && (len(l.waiting) == 0 || l.resting && !l.hurried && len(l.waiting) <= l.most) {
			l.changed.Wait()
		}
		if l.err != nil || len(l.waiting) == 0 {
			return
		}
		items, l.waiting, l.busy = l.waiting, items[:0], true
		if l.pause > 0 && !l.resting {
			l.resting = true
			time.AfterFunc(l.pause, l.rested)
		}
		l.mu.Unlock()
		err := l.work(items)
		clear(items)
		l.mu.Lock()
		l.busy, l.err = false, err
		l.changed.Broadcast()
		if err != nil {
			return
		}
	}
}

func (l *Line[T]) rested() {
	l.mu.Lock()
	defer l.mu.Unlock()
	l.resting = false
	l.changed.Broadcast()
}
