package optimize_test

import (
	"context"
	"flag"
	"math"
	"os"
	"path/filepath"
	"runtime"
	"runtime/debug"
	"strconv"
	"strings"
	"testing"
	"time"

	"hotfront/optimize"
	"hotfront/optimize/archive"
	tp "hotfront/optimize/testproblem"
)

// sized is a problem of the size of a study's: 12 variables, 2 aims, 6 limits and 80 further results. Aims are
// rounded where grain is not 0, so that the front stays small.
type sized struct {
	grain    float64
	bar      float64               // what products of neighbours may be; below 0 nothing is feasible
	around   func(evaluate func()) // called for each evaluation, nil for nothing
	rounds   int                   // of arithmetic that an evaluation burns
	variable []optimize.Variable
}

func newSized(grain float64) *sized {
	p := &sized{grain: grain, bar: 0.7}
	for i := range 12 {
		p.variable = append(p.variable, optimize.Variable{Name: "x" + strconv.Itoa(i), High: 1})
	}
	return p
}

func (p *sized) Variables() []optimize.Variable   { return p.variable }
func (p *sized) Aims() int                        { return 2 }
func (p *sized) Limits() int                      { return 6 }
func (p *sized) Extras() int                      { return 80 }
func (p *sized) Start() [][]float64               { return nil }
func (p *sized) Reference() []float64             { return []float64{1.1, 11} }
func (p *sized) NewEvaluator() optimize.Evaluator { return p }
func (p *sized) meta() archive.Meta {
	m := archive.Meta{Identity: archive.Identity{Fingerprint: "sized"}, Aims: 2, Limits: 6, Reference: p.Reference()}
	for _, v := range p.variable {
		m.Variables = append(m.Variables, v.Name)
	}
	for i := range 80 {
		m.Extras = append(m.Extras, "e"+strconv.Itoa(i))
	}
	return m
}

func (p *sized) Evaluate(q *optimize.Point) {
	if p.around == nil {
		p.evaluate(q)
		return
	}
	p.around(func() { p.evaluate(q) })
}

func (p *sized) evaluate(q *optimize.Point) {
	burnt := burn(p.rounds)
	sum := 0.0
	for _, v := range q.X[1:] {
		sum += v
	}
	g := 1 + 9*sum/11
	q.F[0], q.F[1] = q.X[0], g*(1-math.Sqrt(q.X[0]/g))
	if p.grain > 0 {
		q.F[0], q.F[1] = math.Ceil(q.F[0]/p.grain)*p.grain, math.Ceil(q.F[1]/p.grain)*p.grain
	}
	for k := range q.G {
		q.G[k] = q.X[k+1]*q.X[k+2] - p.bar
	}
	for k := range q.Extra {
		q.Extra[k] = sum*float64(k) + burnt
	}
}

// burn does rounds of arithmetic that cannot be left out; its result is 0 or nearly.
func burn(rounds int) float64 {
	v := 0.5
	for range rounds {
		v = v*0.999 + 1e-4/(1+v)
	}
	return v * 1e-300
}

// roundsOf is how many rounds last so long, by the fastest of several trials.
func roundsOf(d time.Duration) int {
	const trial = 100_000
	best := time.Hour
	for range 50 {
		begin := time.Now()
		if burn(trial) < 0 {
			panic("impossible")
		}
		best = min(best, time.Since(begin))
	}
	return int(trial * float64(d) / float64(best))
}

// TestBytesPerDesign counts what a run keeps in memory for each design beyond a front that hardly grows: three
// counts after collections within one run.
func TestBytesPerDesign(t *testing.T) {
	const begin, step = 20_000, 60_000
	var heap []float64
	var at []int
	set := optimize.Settings{Evaluations: begin + 2*step + 500, Seed: 1, Workers: 2, Population: 40}
	p := newSized(1.0 / 32)
	res, err := optimize.Run(context.Background(), p, set, nil, func(s optimize.Progress) {
		if s.Evaluations >= begin+len(at)*step && len(at) < 3 {
			runtime.GC()
			runtime.GC()
			var m runtime.MemStats
			runtime.ReadMemStats(&m)
			heap, at = append(heap, float64(m.HeapAlloc)), append(at, s.Evaluations)
		}
	})
	if err != nil {
		t.Fatal(err)
	}
	if len(at) != 3 || res.Evaluations != set.Evaluations {
		t.Fatalf("%d counts, %d designs", len(at), res.Evaluations)
	}
	// 8 (12 variables + 2 aims + violation), up to 11 of the table, 32 of history a generation.
	const most = 8*15 + 11 + 2
	got := (heap[2] - heap[0]) / float64(at[2]-at[0])
	if got > 1.05*most {
		t.Errorf("%.0f bytes a design, most %d; front of %d", got, most, len(res.Front))
	}
	t.Logf("%.0f bytes a design in memory; front of %d", got, len(res.Front))
}

// TestMillion measures a run of a million designs, with the archive on disk, when asked for by -million: the
// largest resident memory of the process.
func TestMillion(t *testing.T) {
	if flag.Lookup("million").Value.String() != "true" {
		t.Skip("a measurement, asked for by -million")
	}
	defer debug.SetGCPercent(debug.SetGCPercent(25)) // as the search command
	dir := t.TempDir()
	p := newSized(1.0 / 30_000) // shipped studies have 3 or 4 % of their designs on the front; not rounded this one has 25 %
	a, err := archive.Open(dir, p.meta())
	if err != nil {
		t.Fatal(err)
	}
	set := optimize.Settings{Evaluations: 1_000_000, Seed: 1, Workers: 2, Population: 40}
	begin := time.Now()
	res, err := optimize.Run(context.Background(), p, set, a, nil)
	if err != nil {
		t.Fatal(err)
	}
	took := time.Since(begin)
	if err := a.Close(); err != nil {
		t.Fatal(err)
	}
	info, err := os.Stat(filepath.Join(dir, archive.FileName))
	if err != nil {
		t.Fatal(err)
	}
	t.Logf("%d bytes a design on disk; front of %d; %v", info.Size()/1_000_000, len(res.Front), took)
	status, err := os.ReadFile("/proc/self/status")
	if err != nil {
		t.Logf("memory not known here: %v", err)
	}
	for line := range strings.Lines(string(status)) {
		if strings.HasPrefix(line, "VmHWM") {
			t.Log(strings.TrimSpace(line))
		}
	}
}

// BenchmarkDriver is the driver's own cost on the problems' size of a study, without evaluations and archive.
func BenchmarkDriver(b *testing.B) {
	for _, p := range []optimize.Problem{newSized(0), tp.BNH(), tp.DTLZ2()} {
		name := "sized"
		if q, ok := p.(*tp.Problem); ok {
			name = q.Name
		}
		b.Run(name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				set := optimize.Settings{Evaluations: 20_000, Seed: 1, Population: 40}
				if _, err := optimize.Run(context.Background(), p, set, nil, nil); err != nil {
					b.Fatal(err)
				}
			}
			b.ReportMetric(b.Elapsed().Seconds()*50/float64(b.N), "ms/1000evals")
		})
	}
}
