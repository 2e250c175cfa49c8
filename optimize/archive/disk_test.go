package archive

import (
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"
	"syscall"
	"testing"

	"hotfront/optimize"
)

// TestFullDisk: a disk that fills up (SQLite is told that the file may not grow) ends Record with ErrFull;
// the batches before are there, the one that did not fit is not, and with room again the run goes on.
func TestFullDisk(t *testing.T) {
	dir := t.TempDir()
	a := open(t, dir)
	record(t, a, 0, 8)
	var pages int
	if err := a.db.QueryRow("PRAGMA page_count").Scan(&pages); err != nil {
		t.Fatal(err)
	}
	limit := func(pages int) {
		t.Helper()
		if _, err := a.db.Exec(fmt.Sprintf("PRAGMA max_page_count = %d", pages)); err != nil {
			t.Fatal(err)
		}
	}
	limit(pages + 2)
	var err error
	first := 8
	for ; first < 1000 && err == nil; first += 8 {
		batch := make([]optimize.Point, 8)
		for i := range batch {
			batch[i] = point(first + i)
		}
		err = a.Record(first, batch)
	}
	first -= 8
	if !errors.Is(err, ErrFull) || !strings.Contains(err.Error(), "disk is full") {
		t.Fatalf("full disk after %d designs: %v", first, err)
	}
	if n, err := a.Len(); err != nil || n != first {
		t.Errorf("%d designs, %v; want the %d recorded before", n, err, first)
	}
	limit(1 << 20)
	record(t, a, first, 8)
	if err := a.Close(); err != nil {
		t.Fatal(err)
	}
	a = open(t, dir)
	defer a.Close()
	if err := a.Each(func(seq int, p *optimize.Point) error {
		if !same(*p, point(seq)) {
			t.Errorf("design %d changed", seq)
		}
		return nil
	}); err != nil {
		t.Error(err)
	}
	if n, err := a.Len(); err != nil || n != first+8 {
		t.Errorf("%d designs, %v; want %d", n, err, first+8)
	}
}

// TestErrorsOfTheSystem puts errors of the file system into the words of this package.
func TestErrorsOfTheSystem(t *testing.T) {
	for _, c := range []struct {
		err  error
		want error
	}{
		{&fs.PathError{Op: "open", Path: "x", Err: syscall.EACCES}, ErrReadOnly},
		{&fs.PathError{Op: "open", Path: "x", Err: syscall.EROFS}, ErrReadOnly},
		{&fs.PathError{Op: "write", Path: "x", Err: syscall.ENOSPC}, ErrFull},
	} {
		if got := explain("write", "x", c.err); !errors.Is(got, c.want) || !errors.Is(got, c.err) {
			t.Errorf("%v became %v, want %v", c.err, got, c.want)
		}
	}
	if explain("write", "x", nil) != nil {
		t.Error("no error became one")
	}
}

// TestNamesOfFolders: a folder may have any name.
func TestNamesOfFolders(t *testing.T) {
	for _, name := range []string{"a b", "50%", "what?mode=ro", "a#b", "a&b=c", "\u00e9\u4e2d", "%41", "it's", "a;b"} {
		dir := filepath.Join(t.TempDir(), name)
		a := open(t, dir)
		record(t, a, 0, 3)
		if err := a.Close(); err != nil {
			t.Fatal(err)
		}
		if _, err := os.Stat(filepath.Join(dir, FileName)); err != nil {
			t.Errorf("%q: the archive is somewhere else: %v", name, err)
			continue
		}
		r, err := Read(dir)
		if err != nil {
			t.Errorf("%q: %v", name, err)
			continue
		}
		if n, err := r.Len(); err != nil || n != 3 {
			t.Errorf("%q: %d designs, %v", name, n, err)
		}
		if err := r.Close(); err != nil {
			t.Error(err)
		}
	}
}
