package optimize_test

import (
	"context"
	"fmt"
	"os"
	"path/filepath"
	"runtime"
	"sync/atomic"
	"syscall"
	"testing"
	"time"
	"unsafe"

	"hotfront/optimize"
	"hotfront/optimize/archive"
)

// The clocks of clock_gettime(2) that count processor time, to the nanosecond.
const (
	processTime = 2
	threadTime  = 3
)

// cpu is the processor time used so far by the process or by the calling thread.
func cpu(clock uintptr) time.Duration {
	var t syscall.Timespec
	if _, _, err := syscall.RawSyscall(syscall.SYS_CLOCK_GETTIME, clock, uintptr(unsafe.Pointer(&t)), 0); err != 0 {
		panic(err)
	}
	return time.Duration(t.Nano())
}

// BenchmarkSearch runs a search of 10,000 designs of 0.25 ms each, 40 a generation, archive on disk. own-% is the
// processor time that does not go into evaluations, against that which does; idle-% is the share of the
// workers' wall time in which they do not evaluate, whether they wait or the search has their processor.
func BenchmarkSearch(b *testing.B) {
	const sampling = 16 // processor time is taken of one evaluation in so many: the clock costs too
	for _, workers := range []int{1, 2} {
		b.Run(fmt.Sprintf("workers=%d", workers), func(b *testing.B) {
			p := newSized(0)
			p.rounds = roundsOf(250 * time.Microsecond)
			var busy, count, sampled, burnt atomic.Int64
			p.around = func(evaluate func()) {
				begin := time.Now()
				if count.Add(1)%sampling != 0 {
					evaluate()
				} else {
					runtime.LockOSThread()
					used := cpu(threadTime)
					evaluate()
					burnt.Add(int64(cpu(threadTime) - used))
					runtime.UnlockOSThread()
					sampled.Add(1)
				}
				busy.Add(int64(time.Since(begin)))
			}
			designs, size := 0, int64(0)
			var wall, used time.Duration
			for b.Loop() {
				dir := b.TempDir()
				a, err := archive.Open(dir, p.meta())
				if err != nil {
					b.Fatal(err)
				}
				begin, usedBefore := time.Now(), cpu(processTime)
				set := optimize.Settings{Evaluations: 10_000, Seed: 1, Population: 40, Workers: workers}
				res, err := optimize.Run(context.Background(), p, set, a, nil)
				if err != nil {
					b.Fatal(err)
				}
				wall += time.Since(begin)
				used += cpu(processTime) - usedBefore
				designs += res.Evaluations
				if err := a.Close(); err != nil {
					b.Fatal(err)
				}
				info, err := os.Stat(filepath.Join(dir, archive.FileName))
				if err != nil {
					b.Fatal(err)
				}
				size = info.Size() / int64(res.Evaluations)
			}
			work := float64(burnt.Load()) / float64(sampled.Load()) * float64(designs)
			b.ReportMetric(float64(designs)/wall.Seconds(), "designs/s")
			b.ReportMetric(100*(float64(used)-work)/work, "own-%")
			b.ReportMetric(100*(1-float64(busy.Load())/float64(int64(wall)*int64(workers))), "idle-%")
			b.ReportMetric(float64(size), "disk-B/design")
		})
	}
}
