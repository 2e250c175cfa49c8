package batch

import (
	"context"
	"sync/atomic"
	"testing"
)

type item struct {
	in, out int
	cause   string
}

func squares() func(*item) {
	return func(it *item) {
		if it.in%7 == 3 {
			panic("seven")
		}
		it.out = it.in * it.in
	}
}

func fail(it *item, cause string) { it.cause = cause }

func TestRunByIndexAndPanic(t *testing.T) {
	for _, workers := range []int{-1, 1, 2, 7, 200} {
		pool := NewPool(workers, squares, fail)
		for range 3 { // the pool is used again after panics
			items := make([]item, 100)
			for i := range items {
				items[i].in = i
			}
			if done := pool.Run(context.Background(), items); done != len(items) {
				t.Fatalf("%d workers: %d done", workers, done)
			}
			for i, it := range items {
				switch {
				case i%7 == 3:
					if it.cause != "panic: seven" {
						t.Fatalf("%d workers: item %d has cause %q", workers, i, it.cause)
					}
				case it.out != i*i || it.cause != "":
					t.Fatalf("%d workers: item %d is %+v", workers, i, it)
				}
			}
		}
	}
	if done := NewPool(3, squares, fail).Run(context.Background(), nil); done != 0 {
		t.Errorf("empty batch: %d done", done)
	}
}

// TestRunEndsWithAPrefix cancels in the middle of a batch.
func TestRunEndsWithAPrefix(t *testing.T) {
	for _, workers := range []int{1, 2, 7} {
		ctx, cancel := context.WithCancel(context.Background())
		var count atomic.Int64
		pool := NewPool(workers, func() func(*item) {
			return func(it *item) {
				if count.Add(1) >= 20 { // every worker, since another one may be held up before it cancels
					cancel()
				}
				it.out = 1
			}
		}, fail)
		items := make([]item, 100)
		done := pool.Run(ctx, items)
		if done < 20 || done > 19+workers {
			t.Errorf("%d workers: %d done", workers, done)
		}
		for i, it := range items {
			if (it.out == 1) != (i < done) {
				t.Fatalf("%d workers: item %d of %d done is %+v", workers, i, done, it)
			}
		}
	}
}

func TestBeside(t *testing.T) {
	ch := make(chan int)
	wait := Beside(func() {
		for v := range ch {
			if v == 0 {
				return
			}
		}
	})
	ch <- 1
	ch <- 0
	wait()
}
