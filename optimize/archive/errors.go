package archive

import (
	"errors"
	"fmt"
	"io/fs"
	"strings"
	"syscall"

	"modernc.org/sqlite"
)

// Error is an error without data of its own, to be compared with errors.Is.
type Error string

func (e Error) Error() string { return string(e) }

const (
	// ErrNoRun: the folder holds no archive.
	ErrNoRun = Error("archive: no run in this folder")
	// ErrReadOnly: the folder or the file cannot be written.
	ErrReadOnly = Error("archive: the run folder cannot be written")
	// ErrFull: the disk is full. What was recorded before is safe.
	ErrFull = Error("archive: the disk is full")
	// ErrOtherRun: the folder holds a run that computes something else; see MismatchError.
	ErrOtherRun = Error("archive: the folder holds another run")
	// ErrOlder: the file has a layout that this program no longer reads; see OlderError.
	ErrOlder = Error("archive: the run was made by an older version of hotfront")
	// ErrNewer: the file has a layout that this program does not know.
	ErrNewer = Error("archive: the file was written by a newer program")
)

// Difference is one point in which the stored run and the one asked for differ.
type Difference struct {
	What   string // study, seed, model version, driver, population, results
	Stored string
	Asked  string
}

// MismatchError says in what the run in the folder differs from the one asked for. It unwraps to
// ErrOtherRun.
type MismatchError struct {
	Dir         string
	Differences []Difference
}

func (e *MismatchError) Error() string {
	parts := make([]string, len(e.Differences))
	for i, d := range e.Differences {
		parts[i] = fmt.Sprintf("%s: %s there, %s asked for", d.What, d.Stored, d.Asked)
		if d.Stored == "" && d.Asked == "" {
			parts[i] = "the " + d.What + " has changed"
		}
	}
	return fmt.Sprintf("%s holds another run (%s); give this search a folder of its own", e.Dir, strings.Join(parts, "; "))
}

// Unwrap makes errors.Is(err, ErrOtherRun) hold.
func (e *MismatchError) Unwrap() error { return ErrOtherRun }

// Has says whether the runs differ in this point.
func (e *MismatchError) Has(what string) bool {
	for _, d := range e.Differences {
		if d.What == what {
			return true
		}
	}
	return false
}

// LockedError says that another search writes to the folder.
type LockedError struct {
	Dir   string
	Owner string // as its lock file says, may be empty
}

func (e *LockedError) Error() string {
	owner := ""
	if e.Owner != "" {
		owner = " (" + e.Owner + ")"
	}
	return fmt.Sprintf("another search is writing to %s%s; wait for it, stop it, or use another folder", e.Dir, owner)
}

// OlderError says that the run was made by an older version of the program, whose files this one does not
// read, and what to do. It unwraps to ErrOlder.
type OlderError struct {
	File    string
	Program string // version that began the run, may be empty
}

func (e *OlderError) Error() string {
	version := ""
	if e.Program != "" {
		version = " (" + e.Program + ")"
	}
	return fmt.Sprintf("%s was made by an older version of hotfront%s, which kept designs in another way: search its study again "+
		"in a new folder. The study is in the file's table meta under the key study, as the sqlite3 shell gives it by "+
		"SELECT value FROM meta WHERE key = 'study'; the designs are in its table designs", e.File, version)
}

// Unwrap makes errors.Is(err, ErrOlder) hold.
func (e *OlderError) Unwrap() error { return ErrOlder }

// DamagedError says that the file is not what was written.
type DamagedError struct {
	File string
	What string
	Err  error // may be nil
}

func (e *DamagedError) Error() string {
	text := fmt.Sprintf("archive: %s is damaged: %s", e.File, e.What)
	if e.Err != nil {
		text += ": " + e.Err.Error()
	}
	return text
}

func (e *DamagedError) Unwrap() error { return e.Err }

// Primary result codes of SQLite; the low byte of an extended code.
const (
	sqliteReadOnly = 8
	sqliteCorrupt  = 11
	sqliteFull     = 13
	sqliteCantOpen = 14
	sqliteNotADB   = 26
)

func sqliteCode(err error) int {
	if e, ok := errors.AsType[*sqlite.Error](err); ok {
		return e.Code() & 0xff
	}
	return 0
}

// explain puts an error of the database or the file system into the words of this package.
func explain(verb, file string, err error) error {
	if err == nil {
		return nil
	}
	switch sqliteCode(err) {
	case sqliteReadOnly, sqliteCantOpen:
		return fmt.Errorf("%w: %s %s: %w", ErrReadOnly, verb, file, err)
	case sqliteFull:
		return fmt.Errorf("%w: %s %s: %w", ErrFull, verb, file, err)
	case sqliteCorrupt, sqliteNotADB:
		return &DamagedError{File: file, What: "not a whole database", Err: err}
	}
	switch {
	case errors.Is(err, fs.ErrPermission), errors.Is(err, syscall.EROFS):
		return fmt.Errorf("%w: %s: %w", ErrReadOnly, verb, err)
	case errors.Is(err, syscall.ENOSPC):
		return fmt.Errorf("%w: %s: %w", ErrFull, verb, err)
	}
	return fmt.Errorf("archive: %s %s: %w", verb, file, err)
}
