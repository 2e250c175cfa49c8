package batch

import (
	"context"
	"errors"
	"slices"
	"sync/atomic"
	"testing"
	"time"
)

// TestStreamByOrder puts items while earlier ones are worked on, with panics among them.
func TestStreamByOrder(t *testing.T) {
	for _, workers := range []int{-1, 1, 2, 7} {
		s := NewStream(context.Background(), workers, squares, fail)
		items := make([]item, 1000)
		for i := range items {
			items[i].in = i
		}
		for put := 0; put < len(items); put += 50 {
			for i := range 50 {
				s.Put(&items[put+i])
			}
			want := max(0, put-13) // some are left under way
			if done := s.Wait(want); done < want || done > put+50 {
				t.Fatalf("%d workers: %d done, want at least %d", workers, done, want)
			}
			for i := range want {
				if it := items[i]; i%7 == 3 && it.cause != "panic: seven" || i%7 != 3 && (it.out != i*i || it.cause != "") {
					t.Fatalf("%d workers: item %d is %+v", workers, i, it)
				}
			}
		}
		if done := s.Wait(len(items)); done != len(items) {
			t.Fatalf("%d workers: %d done at the end", workers, done)
		}
		s.Close()
		s.Close() // once more does nothing
	}
}

// TestStreamEndsWithAPrefix ends the context in the middle.
func TestStreamEndsWithAPrefix(t *testing.T) {
	for _, workers := range []int{1, 2, 7} {
		for at := range 30 {
			ctx, cancel := context.WithCancel(context.Background())
			var count atomic.Int64
			s := NewStream(ctx, workers, func() func(*item) {
				return func(it *item) {
					if count.Add(1) > int64(at) {
						cancel()
					}
					it.out = 1
				}
			}, fail)
			items := make([]item, 100)
			for i := range items {
				s.Put(&items[i])
			}
			done := s.Wait(len(items))
			s.Close()
			if done > at+workers || done < min(at, 1) || int64(done) != count.Load() {
				t.Errorf("%d workers: %d done, %d begun, ended after %d", workers, done, count.Load(), at)
			}
			for i, it := range items {
				if (it.out == 1) != (i < done) {
					t.Fatalf("%d workers: item %d of %d done is %+v", workers, i, done, it)
				}
			}
			if more := s.Wait(len(items)); more != done {
				t.Errorf("%d done, then %d", done, more)
			}
			cancel()
		}
	}
}

// TestCloseLeavesWhatHasNotBegun: Close does not work through what waits.
func TestCloseLeavesWhatHasNotBegun(t *testing.T) {
	begun, goOn := make(chan bool), make(chan bool)
	var count atomic.Int64
	s := NewStream(context.Background(), 1, func() func(*item) {
		return func(*item) {
			count.Add(1)
			begun <- true
			<-goOn
		}
	}, fail)
	items := make([]item, 5)
	for i := range items {
		s.Put(&items[i])
	}
	<-begun
	wait := Beside(s.Close)
	for { // until Close has said so
		s.mu.Lock()
		closed := s.closed
		s.mu.Unlock()
		if closed {
			break
		}
		time.Sleep(time.Millisecond)
	}
	goOn <- true
	wait()
	if count.Load() != 1 {
		t.Errorf("%d items begun", count.Load())
	}
}

// TestLine: items arrive in order and whole, gather during a pause, and Flush waits for all without waiting for
// the pause.
func TestLine(t *testing.T) {
	for _, pause := range []time.Duration{0, time.Hour} {
		var got []int
		calls := 0
		l := NewLine(8, pause, func(items []int) error {
			calls++
			got = append(got, items...)
			return nil
		})
		var want []int
		for i := range 100 {
			if err := l.Put([]int{2 * i, 2*i + 1}); err != nil {
				t.Fatal(err)
			}
			want = append(want, 2*i, 2*i+1)
		}
		if err := l.Flush(); err != nil || !slices.Equal(got, want) {
			t.Fatalf("%v, %v", got, err)
		}
		if pause > 0 && calls > 200/8+2 {
			t.Errorf("%d calls: nothing gathers", calls)
		}
		if err := l.Close(); err != nil {
			t.Fatal(err)
		}
	}
}

// TestLineFails: the first error is the last call, and every later method returns it.
func TestLineFails(t *testing.T) {
	full := errors.New("full")
	calls := 0
	l := NewLine(1, 0, func([]int) error {
		calls++
		return full
	})
	var err error
	for end := time.Now().Add(10 * time.Second); err == nil && time.Now().Before(end); {
		err = l.Put([]int{1, 2, 3})
	}
	if !errors.Is(err, full) {
		t.Errorf("put: %v", err)
	}
	if err := l.Flush(); !errors.Is(err, full) {
		t.Errorf("flush: %v", err)
	}
	if err := l.Close(); !errors.Is(err, full) || calls != 1 {
		t.Errorf("close: %v after %d calls", err, calls)
	}
}
