package archive

import (
	"bytes"
	"database/sql"
	"errors"
	"fmt"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"hotfront/optimize"
)

// changed records a run, lets SQLite change its file, and gives the folder.
func changed(t *testing.T, statement string) string {
	t.Helper()
	dir := t.TempDir()
	a := open(t, dir)
	for first := 0; first < 20; first += 4 {
		record(t, a, first, 4)
	}
	if _, err := a.db.Exec(statement); err != nil {
		t.Fatal(err)
	}
	if err := a.Close(); err != nil {
		t.Fatal(err)
	}
	return dir
}

// readAll opens a run and reads every design.
func readAll(dir string) error {
	a, err := Read(dir)
	if err != nil {
		return err
	}
	err = a.Each(func(int, *optimize.Point) error { return nil })
	return errors.Join(err, a.Close())
}

// TestWhatIsWrongIsNamed changes an archive in ways that leave a sound database: each is a DamagedError
// that says what is wrong, of Read and Each as of Open and Recall.
func TestWhatIsWrongIsNamed(t *testing.T) {
	for _, c := range []struct{ statement, want string }{
		{"DELETE FROM batches WHERE first = 4", "design 4 is missing"},
		{"DELETE FROM batches WHERE first = 0", "design 0 is missing"},
		{"DELETE FROM results WHERE first = 8", "results of the designs from 8 on are missing"},
		{"UPDATE batches SET data = (SELECT data FROM batches WHERE first = 0) WHERE first = 8", "designs from 8 on is not what was written"},
		{"UPDATE batches SET data = x'00' WHERE first = 12", "designs from 12 on is not what was written"},
		{"UPDATE results SET data = x'' WHERE first = 4", "designs from 4 on is not what was written"},
		{"UPDATE results SET data = (SELECT data FROM results WHERE first = 0) WHERE first = 8", "designs from 8 on is not what was written"},
		{"UPDATE results SET sum = sum + 1 WHERE first = 8", "designs from 8 on is not what was written"},
		{"UPDATE results SET sum = 'many' WHERE first = 8", "designs from 8 on cannot be read"},
		{"UPDATE batches SET count = 3 WHERE first = 8", "designs from 8 on is not what was written"},
		{"UPDATE batches SET data = replace(CAST(data AS TEXT), 'cause', 'cruse') WHERE first = 8", "designs from 8 on is not what was written"},
		{"UPDATE batches SET sum = sum + 1 WHERE first = 4", "designs from 4 on is not what was written"},
		{"UPDATE batches SET sum = 'many' WHERE first = 12", "designs from 12 on cannot be read"},
		{"UPDATE batches SET first = 30 WHERE first = 16", "from 30 on is not what was written"},
		{"DELETE FROM meta WHERE key = 'driver'", "no driver"},
		{"UPDATE meta SET value = '-1' WHERE key = 'seed'", `seed is "-1"`},
		{"UPDATE meta SET value = '' WHERE key = 'aims'", `aims is ""`},
		{"UPDATE meta SET value = 'soon' WHERE key = 'created'", `created is "soon"`},
		{"UPDATE meta SET value = '1 x' WHERE key = 'reference'", "reference is"},
		{"UPDATE meta SET value = '3' WHERE key = 'aims'", "contradict"},
		{"PRAGMA application_id = 1", "a database of something else"},
	} {
		dir := changed(t, c.statement)
		err := readAll(dir)
		if damaged, ok := errors.AsType[*DamagedError](err); !ok || !strings.Contains(err.Error(), c.want) || !strings.Contains(damaged.File, dir) {
			t.Errorf("%s: %v; want %q", c.statement, err, c.want)
		}
		a, err := Open(dir, meta())
		if err == nil {
			_, err = a.Recall(0, make([]optimize.Point, 40))
			err = errors.Join(err, a.Close())
		}
		if _, ok := errors.AsType[*DamagedError](err); !ok || !strings.Contains(err.Error(), c.want) {
			t.Errorf("%s, to go on: %v; want %q", c.statement, err, c.want)
		}
	}
}

func TestNewerLayoutIsRefused(t *testing.T) {
	dir := changed(t, fmt.Sprintf("PRAGMA user_version = %d", layout+1))
	if err := readAll(dir); !errors.Is(err, ErrNewer) {
		t.Errorf("read: %v", err)
	}
	for range 2 { // the second shows that the first let the lock go
		if _, err := Open(dir, meta()); !errors.Is(err, ErrNewer) || !strings.Contains(err.Error(), "layout 3") {
			t.Errorf("open: %v", err)
		}
	}
}

// TestOlderLayoutIsRefused: a run folder of layout 1, made here as versions up to then made it, is neither
// taken up nor read nor changed. The error says what to do, and its way to the study works.
func TestOlderLayoutIsRefused(t *testing.T) {
	dir := t.TempDir()
	db, err := sql.Open("sqlite", filepath.Join(dir, FileName))
	if err != nil {
		t.Fatal(err)
	}
	for _, statement := range []string{
		"CREATE TABLE meta (key TEXT PRIMARY KEY, value TEXT NOT NULL) WITHOUT ROWID",
		"INSERT INTO meta VALUES ('study', 'study: old'), ('program', '0.9')",
		`CREATE TABLE designs (seq INTEGER PRIMARY KEY, x BLOB NOT NULL, f BLOB NOT NULL, g BLOB NOT NULL, extra BLOB NOT NULL,
			cause TEXT NOT NULL, sum INTEGER NOT NULL)`,
		"INSERT INTO designs VALUES (0, x'', x'', x'', x'', 'not buildable', 1)",
		fmt.Sprintf("PRAGMA application_id = %d", applicationID), "PRAGMA user_version = 1",
	} {
		if _, err := db.Exec(statement); err != nil {
			t.Fatal(err)
		}
	}
	if err := db.Close(); err != nil {
		t.Fatal(err)
	}
	before, err := os.ReadFile(filepath.Join(dir, FileName))
	if err != nil {
		t.Fatal(err)
	}
	refused := func(what string, err error) {
		t.Helper()
		if !errors.Is(err, ErrOlder) {
			t.Fatalf("%s: %v", what, err)
		}
		for _, want := range []string{dir, "older version of hotfront (0.9)", "search its study again", "SELECT value FROM meta WHERE key = 'study'"} {
			if !strings.Contains(err.Error(), want) {
				t.Errorf("%s: %v; want %q", what, err, want)
			}
		}
	}
	refused("read", readAll(dir))
	for range 2 { // the second shows that the first let the lock go
		_, err := Open(dir, meta())
		refused("open", err)
	}
	if db, err = sql.Open("sqlite", filepath.Join(dir, FileName)); err != nil {
		t.Fatal(err)
	}
	var study string
	if err := db.QueryRow("SELECT value FROM meta WHERE key = 'study'").Scan(&study); err != nil || study != "study: old" {
		t.Errorf("study %q, %v", study, err)
	}
	if err := db.Close(); err != nil {
		t.Fatal(err)
	}
	if after, err := os.ReadFile(filepath.Join(dir, FileName)); err != nil || !bytes.Equal(before, after) {
		t.Errorf("the file has changed: %v", err)
	}
}

// TestCutAtEveryPage: an archive that lost its end at any page is noticed or reads as it was; none makes a
// panic, and what is noticed is a typed error.
func TestCutAtEveryPage(t *testing.T) {
	dir := changed(t, "VACUUM")
	file := filepath.Join(dir, FileName)
	whole, err := os.ReadFile(file)
	if err != nil {
		t.Fatal(err)
	}
	const page = 4096
	if len(whole) < 3*page {
		t.Fatalf("archive of %d bytes: too small for this test", len(whole))
	}
	sizes := []int{1, 100, 511, len(whole) - 1}
	for size := page; size < len(whole); size += page {
		sizes = append(sizes, size-1, size, size+1, size+page/2)
	}
	for _, size := range sizes {
		if err := os.WriteFile(file, whole[:size], 0o600); err != nil {
			t.Fatal(err)
		}
		err := readAll(dir)
		if _, ok := errors.AsType[*DamagedError](err); !ok {
			t.Errorf("cut to %d of %d bytes: %v", size, len(whole), err)
		}
	}
	if err := os.WriteFile(file, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	if err := readAll(dir); !errors.Is(err, ErrNoRun) {
		t.Errorf("empty file: %v", err)
	}
}

// TestNotAnArchive: what stands in the place of the archive is neither read nor written over.
func TestNotAnArchive(t *testing.T) {
	text := filepath.Join(t.TempDir(), FileName)
	letter := bytes.Repeat([]byte("not a database\n"), 1000)
	if err := os.WriteFile(text, letter, 0o600); err != nil {
		t.Fatal(err)
	}
	if _, err := Open(filepath.Dir(text), meta()); err == nil {
		t.Error("a text was opened")
	} else if _, ok := errors.AsType[*DamagedError](err); !ok {
		t.Errorf("a text: %v", err)
	}
	if data, err := os.ReadFile(text); err != nil || !bytes.Equal(data, letter) {
		t.Errorf("the text was changed: %v", err)
	}
	folder := t.TempDir()
	if err := os.Mkdir(filepath.Join(folder, FileName), 0o700); err != nil {
		t.Fatal(err)
	}
	if _, err := Open(folder, meta()); err == nil || !strings.Contains(err.Error(), "is a folder") {
		t.Errorf("a folder in place of the archive: %v", err)
	}
	if err := readAll(folder); err == nil || !strings.Contains(err.Error(), "is a folder") {
		t.Errorf("reading a folder in place of the archive: %v", err)
	}
}

// TestExtremes: the ends of float64, an empty and a very long cause, and parts without numbers come back
// as they were.
func TestExtremes(t *testing.T) {
	m := meta()
	m.Variables, m.Aims, m.Limits, m.Extras, m.Reference = []string{"a"}, 1, 0, nil, []float64{math.Inf(-1)}
	long := strings.Repeat("why \u4e2d\x00\n", 100_000)
	points := []optimize.Point{
		{X: []float64{math.MaxFloat64}, F: []float64{-math.MaxFloat64}, G: []float64{}, Extra: []float64{}},
		{X: []float64{math.Inf(1)}, F: []float64{math.Inf(-1)}, G: []float64{}, Extra: []float64{}, Cause: long},
		{X: []float64{math.Copysign(0, -1)}, F: []float64{math.SmallestNonzeroFloat64}, G: []float64{}, Extra: []float64{}},
		{X: []float64{0}, F: []float64{0}, G: []float64{}, Extra: []float64{}, Cause: ""},
		{X: []float64{math.Nextafter(1, 2)}, F: []float64{math.Float64frombits(0x7ff8000000000001)}, G: []float64{}, Extra: []float64{}, Cause: " "},
	}
	dir := t.TempDir()
	a, err := Open(dir, m)
	if err != nil {
		t.Fatal(err)
	}
	if err := a.Record(0, points); err != nil {
		t.Fatal(err)
	}
	if err := a.Close(); err != nil {
		t.Fatal(err)
	}
	a, err = Read(dir)
	if err != nil {
		t.Fatal(err)
	}
	defer a.Close()
	got := make([]optimize.Point, 9)
	n, err := a.Recall(0, got)
	if err != nil || n != len(points) {
		t.Fatalf("%d designs, %v", n, err)
	}
	for i := range points {
		if !same(got[i], points[i]) {
			t.Errorf("design %d: X %v F %v, cause of %d bytes", i, got[i].X, got[i].F, len(got[i].Cause))
		}
	}
	if ref := a.Meta().Reference; len(ref) != 1 || !math.IsInf(ref[0], -1) {
		t.Errorf("reference %v", ref)
	}
}

// TestOrderOfNumbers: Record takes only the numbers that follow; what it refuses leaves no trace, and
// recalling from beyond the end gives nothing.
func TestOrderOfNumbers(t *testing.T) {
	a := open(t, t.TempDir())
	defer a.Close()
	record(t, a, 0, 3)
	for _, first := range []int{0, 2, 4, -1, math.MaxInt32} {
		if err := a.Record(first, []optimize.Point{point(first)}); err == nil {
			t.Errorf("recorded %d after 3 designs", first)
		}
	}
	if err := a.Record(9, nil); err != nil {
		t.Errorf("no points: %v", err)
	}
	record(t, a, 3, 1)
	if n, err := a.Len(); n != 4 || err != nil {
		t.Errorf("%d designs, %v", n, err)
	}
	if n, err := a.Recall(4, make([]optimize.Point, 2)); n != 0 || err != nil {
		t.Errorf("beyond the end: %d, %v", n, err)
	}
	stop := errors.New("enough")
	seen := 0
	if err := a.Each(func(int, *optimize.Point) error { seen++; return stop }); !errors.Is(err, stop) || seen != 1 {
		t.Errorf("an error of visit: %v after %d", err, seen)
	}
	record(t, a, 4, 1) // reading that was broken off holds nothing up
}

// TestReaderSeesWholeBatches: a reader beside the writer sees whole batches, never a part.
func TestReaderSeesWholeBatches(t *testing.T) {
	dir := t.TempDir()
	a := open(t, dir)
	defer a.Close()
	for first := 0; first < 80; first += 8 {
		record(t, a, first, 8)
		n := 0
		r, err := Read(dir)
		if err != nil {
			t.Fatal(err)
		}
		if err := r.Each(func(int, *optimize.Point) error { n++; return nil }); err != nil || n != first+8 {
			t.Errorf("%d designs, %v; want %d", n, err, first+8)
		}
		if err := r.Record(n, []optimize.Point{point(n)}); !errors.Is(err, ErrReadOnly) {
			t.Errorf("a reader wrote: %v", err)
		}
		if err := r.Close(); err != nil {
			t.Error(err)
		}
	}
}
