// Package batch works through independent items in goroutines: a batch at a time (Pool), as they come
// (Stream), or one after another beside the caller (Line). It is the only place of the search that starts any.
//
// Items are handed out one at a time in ascending order, so a slow item holds up one worker and no
// other, and what is finished when a context ends is always a prefix of the batch. Each item is
// written in place by the worker that took it: the outcome does not depend on how many workers there
// are or how they are scheduled.
package batch

import (
	"context"
	"fmt"
	"sync"
	"sync/atomic"
)

// Pool holds one work function per worker. The functions keep their workspace between batches. A Pool
// serves one Run at a time.
type Pool[T any] struct {
	newWorker func() func(*T)
	failed    func(item *T, cause string)
	workers   []func(*T)
}

// NewPool makes a pool of the given number of workers, at least one. newWorker makes the function of one
// worker; it is called when a worker is first needed, and again after a panic, since a panic may have
// left a workspace in disorder. failed marks an item whose work panicked.
func NewPool[T any](workers int, newWorker func() func(*T), failed func(item *T, cause string)) *Pool[T] {
	return &Pool[T]{
		newWorker: newWorker,
		failed:    failed,
		workers:   make([]func(*T), max(1, workers)),
	}
}

// Run works through the items and returns how many are done: all of them, or the length of the finished
// prefix if ctx ended before. An item that has begun is always finished.
func (p *Pool[T]) Run(ctx context.Context, items []T) int {
	var next atomic.Int64
	var done atomic.Int64
	loop := func(w int) {
		for ctx.Err() == nil {
			i := int(next.Add(1)) - 1
			if i >= len(items) {
				return
			}
			p.one(w, &items[i])
			done.Add(1)
		}
	}
	n := min(len(p.workers), len(items))
	for w := range n {
		if p.workers[w] == nil {
			p.workers[w] = p.newWorker()
		}
	}
	if n <= 1 {
		if n == 1 {
			loop(0)
		}
		return int(done.Load())
	}
	var wg sync.WaitGroup
	for w := range n {
		wg.Go(func() { loop(w) })
	}
	wg.Wait()
	return int(done.Load())
}

// one does one item.
func (p *Pool[T]) one(w int, item *T) {
	if !attempt(p.workers[w], item, p.failed) {
		p.workers[w] = p.newWorker()
	}
}

// panicked is the cause of a failed item whose work panicked.
func panicked(r any) string { return fmt.Sprintf("panic: %v", r) }

// Beside runs f in a goroutine of its own and returns a function that waits for its end. It is for a
// library method that wants to own its flow of control and talks through channels.
func Beside(f func()) (wait func()) {
	var wg sync.WaitGroup
	wg.Go(f)
	return wg.Wait
}
