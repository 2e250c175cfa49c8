package archive

import (
	"bufio"
	"bytes"
	"errors"
	"math"
	"math/rand/v2"
	"os"
	"os/exec"
	"path/filepath"
	"reflect"
	"strconv"
	"strings"
	"testing"
	"time"

	"hotfront/optimize"
)

func meta() Meta {
	return Meta{
		Identity: Identity{Fingerprint: "abc", Model: "1", Seed: 7, Driver: "genetic", Population: 0},
		Name:     "study", Text: "study: study\n", Canonical: "study: study\n", Program: "test", Created: time.Unix(1e9, 0).UTC(),
		Variables: []string{"a", "b"}, Aims: 2, Limits: 1, Extras: []string{"x", "y", "z"}, Reference: []float64{0, 0.1},
	}
}

// point makes the point of a number: a function of the number alone, with numbers that are hard to keep.
func point(seq int) optimize.Point {
	r := rand.New(rand.NewPCG(uint64(seq), 1))
	p := optimize.Point{X: []float64{r.NormFloat64(), math.SmallestNonzeroFloat64}, F: []float64{-r.ExpFloat64(), math.MaxFloat64},
		G: []float64{math.Copysign(0, -1)}, Extra: []float64{1.0 / 3, r.Float64(), -1e-300}}
	if seq%4 == 1 {
		p.Extra = nil
	}
	if seq%5 == 3 {
		p.F, p.G, p.Extra = []float64{0, 0}, []float64{0}, nil
		p.Cause = strings.Repeat("cause \u00b5 ", seq)
	}
	return p
}

func record(t testing.TB, a *Archive, first, n int) {
	t.Helper()
	var points []optimize.Point
	for i := range n {
		points = append(points, point(first+i))
	}
	if err := a.Record(first, points); err != nil {
		t.Fatal(err)
	}
}

func open(t testing.TB, dir string) *Archive {
	t.Helper()
	a, err := Open(dir, meta())
	if err != nil {
		t.Fatal(err)
	}
	return a
}

// same compares bit for bit.
func same(a, b optimize.Point) bool {
	bits := func(p optimize.Point) (list []uint64) {
		for _, v := range [][]float64{p.X, p.F, p.G, p.Extra} {
			for _, x := range v {
				list = append(list, math.Float64bits(x))
			}
			list = append(list, uint64(len(v)))
		}
		return list
	}
	return a.Cause == b.Cause && reflect.DeepEqual(bits(a), bits(b))
}

func TestRecallIsWhatWasRecorded(t *testing.T) {
	dir := t.TempDir()
	a := open(t, dir)
	record(t, a, 0, 40)
	record(t, a, 40, 7)
	if err := a.Record(50, []optimize.Point{point(50)}); err == nil {
		t.Error("a gap in the numbers was taken")
	}
	if err := a.Close(); err != nil {
		t.Fatal(err)
	}
	a = open(t, dir)
	defer a.Close()
	if n, err := a.Len(); err != nil || n != 47 {
		t.Fatalf("%d designs, %v; want 47", n, err)
	}
	dst := make([]optimize.Point, 20)
	n, err := a.Recall(35, dst)
	if err != nil || n != 12 {
		t.Fatalf("recalled %d, %v; want 12", n, err)
	}
	for i := range n {
		if !same(dst[i], point(35+i)) {
			t.Errorf("design %d: %+v, want %+v", 35+i, dst[i], point(35+i))
		}
	}
	next := 0
	err = a.Each(func(seq int, p *optimize.Point) error {
		if seq != next || !same(*p, point(seq)) {
			t.Errorf("design %d out of order or changed", seq)
		}
		next++
		return nil
	})
	if err != nil || next != 47 {
		t.Errorf("went through %d designs, %v", next, err)
	}
	if m := a.Meta(); !reflect.DeepEqual(m, meta()) {
		t.Errorf("meta %+v, want %+v", m, meta())
	}
}

func TestOtherRunIsRefused(t *testing.T) {
	dir := t.TempDir()
	if err := open(t, dir).Close(); err != nil {
		t.Fatal(err)
	}
	for what, change := range map[string]func(*Meta){
		"study":         func(m *Meta) { m.Fingerprint = "abd" },
		"seed":          func(m *Meta) { m.Seed++ },
		"model version": func(m *Meta) { m.Model = "2" },
		"driver":        func(m *Meta) { m.Driver = "simplex" },
		"population":    func(m *Meta) { m.Population = 8 },
	} {
		m := meta()
		change(&m)
		_, err := Open(dir, m)
		mismatch, ok := errors.AsType[*MismatchError](err)
		if !ok || !errors.Is(err, ErrOtherRun) || !mismatch.Has(what) || len(mismatch.Differences) != 1 {
			t.Errorf("changed %s: %v", what, err)
		}
	}
	m := meta()
	m.Created, m.Program, m.Text = time.Now(), "other", "study: study # comment\n"
	a, err := Open(dir, m)
	if err != nil {
		t.Fatalf("what does not matter was refused: %v", err)
	}
	if err := a.Close(); err != nil {
		t.Error(err)
	}
}

func TestSecondSearchIsRefused(t *testing.T) {
	dir := t.TempDir()
	a := open(t, dir)
	_, err := Open(dir, meta())
	if locked, ok := errors.AsType[*LockedError](err); !ok || !strings.Contains(locked.Error(), "another search") {
		t.Errorf("second opener: %v", err)
	}
	r, err := Read(dir) // reading beside it is fine
	if err != nil {
		t.Fatal(err)
	}
	if err := errors.Join(r.Close(), a.Close()); err != nil {
		t.Fatal(err)
	}
	if err := open(t, dir).Close(); err != nil {
		t.Error(err)
	}
}

func TestNoRunAndBadFiles(t *testing.T) {
	if _, err := Read(t.TempDir()); !errors.Is(err, ErrNoRun) {
		t.Errorf("empty folder: %v", err)
	}
	file := filepath.Join(t.TempDir(), "file")
	if err := os.WriteFile(file, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	if _, err := Open(filepath.Join(file, "run"), meta()); err == nil {
		t.Error("a file in place of the folder was taken")
	}
	// A whole archive, then one with bytes changed or cut: an error, never a panic, never wrong numbers.
	dir := t.TempDir()
	a := open(t, dir)
	record(t, a, 0, 200)
	if err := a.Close(); err != nil {
		t.Fatal(err)
	}
	whole, err := os.ReadFile(filepath.Join(dir, FileName))
	if err != nil {
		t.Fatal(err)
	}
	random := rand.New(rand.NewPCG(3, 3))
	caught := 0
	for range 60 {
		data := bytes.Clone(whole)
		if random.IntN(3) == 0 {
			data = data[:random.IntN(len(data))]
		} else {
			for range 50 {
				data[random.IntN(len(data))] ^= byte(1 + random.IntN(255))
			}
		}
		bad := t.TempDir()
		if err := os.WriteFile(filepath.Join(bad, FileName), data, 0o600); err != nil {
			t.Fatal(err)
		}
		r, err := Read(bad)
		if err != nil {
			caught++
			continue
		}
		err = r.Each(func(seq int, p *optimize.Point) error {
			if !same(*p, point(seq)) {
				t.Errorf("design %d came back changed from a damaged file", seq)
			}
			return nil
		})
		if err != nil {
			caught++
		}
		_ = r.Close() // a damaged file may not close cleanly
	}
	if caught < 30 {
		t.Errorf("only %d of 60 damaged files were noticed", caught)
	}
}

// TestKilledWriter kills (kill -9) a process that records without pause, and looks that everything it said
// was recorded is there, whole and in order, and that the folder can be taken up again.
func TestKilledWriter(t *testing.T) {
	if dir := os.Getenv("HOTFRONT_TEST_WRITER"); dir != "" {
		writeForever(t, dir)
		return
	}
	dir := t.TempDir()
	random := rand.New(rand.NewPCG(4, 4))
	for range 3 {
		cmd := exec.Command(os.Args[0], "-test.run", "^TestKilledWriter$")
		cmd.Env = append(os.Environ(), "HOTFRONT_TEST_WRITER="+dir)
		out, err := cmd.StdoutPipe()
		if err != nil {
			t.Fatal(err)
		}
		if err := cmd.Start(); err != nil {
			t.Fatal(err)
		}
		// Kill it some time after it has begun to record, and take what it said until then.
		said := 0
		lines := bufio.NewReader(out)
		for {
			line, err := lines.ReadString('\n')
			if err != nil { // the end, in the middle of a line it may be
				break
			}
			n, ok := strings.CutPrefix(line, "recorded ")
			if !ok {
				continue
			}
			if said == 0 {
				time.AfterFunc(time.Duration(random.IntN(250))*time.Millisecond, func() { _ = cmd.Process.Kill() })
			}
			if said, err = strconv.Atoi(strings.TrimSpace(n)); err != nil {
				t.Fatal(err)
			}
		}
		_ = cmd.Wait() // killed
		a := open(t, dir)
		n, err := a.Len()
		if err != nil || n < said || n%8 != 0 {
			t.Errorf("%d designs in the archive, %v; the writer said %d", n, err, said)
		}
		if err := a.Each(func(seq int, p *optimize.Point) error {
			if !same(*p, point(seq)) {
				t.Errorf("design %d changed", seq)
			}
			return nil
		}); err != nil {
			t.Error(err)
		}
		if said == 0 {
			t.Error("the writer was killed before it recorded anything: the test shows nothing")
		}
		if err := a.Close(); err != nil {
			t.Fatal(err)
		}
	}
}

func writeForever(t *testing.T, dir string) {
	a := open(t, dir)
	first, err := a.Len()
	if err != nil {
		t.Fatal(err)
	}
	for ; ; first += 8 {
		record(t, a, first, 8)
		if _, err := os.Stdout.WriteString("recorded " + strconv.Itoa(first+8) + "\n"); err != nil {
			t.Fatal(err)
		}
	}
}

// BenchmarkRecord stores batches of 60 designs; each is durable before the next.
func BenchmarkRecord(b *testing.B) {
	a := open(b, b.TempDir())
	defer a.Close()
	batch := make([]optimize.Point, 60)
	for i := range batch {
		batch[i] = point(5 * i) // with a result
	}
	first := 0
	for b.Loop() {
		if err := a.Record(first, batch); err != nil {
			b.Fatal(err)
		}
		first += len(batch)
	}
	b.ReportMetric(float64(first)/b.Elapsed().Seconds(), "designs/s")
}
