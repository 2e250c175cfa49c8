package archive

import (
	"context"
	"database/sql"
	"errors"
	"fmt"
	"io/fs"
	"net/url"
	"os"
	"path/filepath"
	"strings"
)

const (
	// FileName is the name of the archive in a run folder.
	FileName = "archive.sqlite"
	lockName = "archive.lock"

	// layout is the version of the tables, kept in the file's user_version.
	layout = 2
	// applicationID marks a file as an archive of this program: "hotf".
	applicationID = 0x686f7466
)

// Archive is a run on disk. It is used by one goroutine at a time.
type Archive struct {
	dir  string
	file string
	db   *sql.DB
	lock *lock // nil when read only
	meta Meta

	// For Record alone.
	stored        int // designs
	insertBatch   *sql.Stmt
	insertResults *sql.Stmt
	room          []byte
}

// Open takes up the run in a folder or begins one, and locks the folder until Close. A run that is there
// must have the same identity; if not, the error is a MismatchError. A second search on the folder gets a
// LockedError; the lock of a killed process is gone with it.
func Open(dir string, m Meta) (*Archive, error) {
	if err := os.MkdirAll(dir, 0o777); err != nil {
		return nil, explain("make", dir, err)
	}
	l, err := acquire(dir)
	if err != nil {
		return nil, err
	}
	a, err := openLocked(dir, m)
	if err != nil {
		return nil, errors.Join(err, l.release())
	}
	a.lock = l
	return a, nil
}

func openLocked(dir string, m Meta) (*Archive, error) {
	file := filepath.Join(dir, FileName)
	if info, err := os.Stat(file); err == nil {
		if err := whole(file, info); err != nil {
			return nil, err
		}
	} else if !errors.Is(err, fs.ErrNotExist) {
		return nil, explain("open", file, err)
	}
	a, err := connect(dir, "rwc")
	if err != nil {
		return nil, err
	}
	fresh, err := a.check() // before anything that changes the file
	if err == nil {
		_, err = a.db.Exec("PRAGMA journal_mode = WAL")
		err = explain("open", file, err)
	}
	if err == nil && fresh {
		err = a.create(&m)
	} else if err == nil {
		if a.meta, err = a.readMeta(); err == nil {
			if d := differences(&a.meta, &m); len(d) > 0 {
				err = &MismatchError{Dir: dir, Differences: d}
			}
		}
	}
	if err == nil {
		err = a.prepare()
	}
	if err != nil {
		return nil, errors.Join(err, a.db.Close())
	}
	return a, nil
}

// Read opens the run in a folder for reading.
func Read(dir string) (*Archive, error) {
	file := filepath.Join(dir, FileName)
	f, err := os.Open(file) // the database does not tell what may not be read from what may not be written
	if errors.Is(err, fs.ErrNotExist) {
		return nil, fmt.Errorf("%w: %s", ErrNoRun, dir)
	} else if err != nil {
		return nil, fmt.Errorf("archive: read: %w", err)
	}
	info, err := f.Stat()
	if err := errors.Join(err, f.Close()); err != nil {
		return nil, fmt.Errorf("archive: read: %w", err)
	}
	if err := whole(file, info); err != nil {
		return nil, err
	}
	// A reader helps itself to the write-ahead file, for which it must write to the folder. Where that
	// is not possible and there is no such file, the archive cannot change and is read as it is.
	modes := []string{"rw", "ro"}
	if _, err := os.Stat(file + "-wal"); errors.Is(err, fs.ErrNotExist) {
		modes = append(modes, "ro&immutable=1")
	}
	var first error
	for _, mode := range modes {
		a, err := openReading(dir, mode)
		if err == nil {
			return a, nil
		}
		if first == nil {
			first = err
		}
		if !errors.Is(err, ErrReadOnly) {
			return nil, err
		}
	}
	return nil, first
}

func openReading(dir, mode string) (*Archive, error) {
	a, err := connect(dir, mode)
	if err != nil {
		return nil, err
	}
	fresh, err := a.check()
	if err == nil && fresh {
		err = fmt.Errorf("%w: %s", ErrNoRun, dir)
	}
	if err == nil {
		a.meta, err = a.readMeta()
	}
	if err == nil {
		_, err = a.Len() // the first read of a page beyond the head
	}
	if err != nil {
		return nil, errors.Join(err, a.db.Close())
	}
	return a, nil
}

// whole refuses what cannot be an archive by its kind or size. SQLite takes a part of a page for a page
// with blanks: a file that lost its end could read as one of fewer designs. Only the write-ahead file or a
// journal, which mend it, may stand beside such a file.
func whole(file string, info fs.FileInfo) error {
	const pageSize = 4096 // SQLite's default
	if info.IsDir() {
		return &DamagedError{File: file, What: "it is a folder"}
	}
	if info.Size()%pageSize == 0 {
		return nil
	}
	for _, suffix := range []string{"-wal", "-journal"} {
		if _, err := os.Stat(file + suffix); err == nil {
			return nil
		}
	}
	return &DamagedError{File: file, What: "not a whole database"}
}

// connect opens the database on one connection. mode is SQLite's, with further parameters behind &.
func connect(dir, mode string) (*Archive, error) {
	file := filepath.Join(dir, FileName)
	full, err := filepath.Abs(file)
	if err != nil {
		return nil, fmt.Errorf("archive: find %s: %w", file, err)
	}
	path := filepath.ToSlash(full)
	if !strings.HasPrefix(path, "/") {
		path = "/" + path // a drive letter
	}
	query := "mode=" + mode + "&_txlock=immediate&_pragma=busy_timeout(10000)"
	if mode == "rwc" {
		query += "&_pragma=synchronous(FULL)"
	} else {
		query += "&_pragma=query_only(1)"
	}
	u := url.URL{Scheme: "file", Path: path, RawQuery: query}
	db, err := sql.Open("sqlite", u.String())
	if err != nil {
		return nil, explain("open", file, err)
	}
	db.SetMaxOpenConns(1)
	if err := db.PingContext(context.Background()); err != nil {
		return nil, errors.Join(explain("open", file, err), db.Close())
	}
	return &Archive{dir: dir, file: file, db: db}, nil
}

// check looks whether the file is an archive; fresh says that it holds nothing yet.
func (a *Archive) check() (fresh bool, err error) {
	var id, version, tables int
	err = errors.Join(
		a.db.QueryRow("PRAGMA application_id").Scan(&id),
		a.db.QueryRow("PRAGMA user_version").Scan(&version),
		a.db.QueryRow("SELECT count(*) FROM sqlite_master").Scan(&tables))
	switch {
	case err != nil:
		return false, explain("read", a.file, err)
	case tables == 0 && id == 0 && version == 0:
		return true, nil
	case id != applicationID:
		return false, &DamagedError{File: a.file, What: "a database of something else"}
	case version > layout:
		return false, fmt.Errorf("%w: %s has layout %d, this program knows %d", ErrNewer, a.file, version, layout)
	case version < layout:
		return false, &OlderError{File: a.file, Program: a.writer()}
	}
	return false, nil
}

// writer is the version of the program that began the run, as far as the file tells.
func (a *Archive) writer() string {
	var version string
	if a.db.QueryRow("SELECT value FROM meta WHERE key = 'program'").Scan(&version) != nil {
		return "" // the message does without it
	}
	return version
}

// create makes the tables and writes what the run is, all or nothing.
func (a *Archive) create(m *Meta) error {
	tx, err := a.db.Begin()
	if err != nil {
		return explain("begin", a.file, err)
	}
	for _, statement := range []string{
		"CREATE TABLE meta (key TEXT PRIMARY KEY, value TEXT NOT NULL) WITHOUT ROWID",
		`CREATE TABLE batches (
			first INTEGER PRIMARY KEY, -- number of the first design, from 0 without a gap
			count INTEGER NOT NULL,    -- designs in the row
			data  BLOB NOT NULL,       -- flags, x, f and g (little-endian float64), causes
			sum   INTEGER NOT NULL     -- CRC-32C of the row
		)`,
		`CREATE TABLE results (
			first INTEGER PRIMARY KEY, -- as in batches
			data  BLOB NOT NULL,       -- little-endian float64
			sum   INTEGER NOT NULL     -- CRC-32C of the row
		)`,
		fmt.Sprintf("PRAGMA application_id = %d", applicationID),
		fmt.Sprintf("PRAGMA user_version = %d", layout),
	} {
		if _, err = tx.Exec(statement); err != nil {
			break
		}
	}
	if err == nil {
		err = writeMeta(tx, m)
	}
	if err != nil {
		return explain("create", a.file, errors.Join(err, tx.Rollback()))
	}
	if err := tx.Commit(); err != nil {
		return explain("create", a.file, err)
	}
	a.meta, err = a.readMeta()
	return err
}

func (a *Archive) readMeta() (Meta, error) {
	m, err := readMeta(a.db)
	if errors.Is(err, errMeta) {
		return m, &DamagedError{File: a.file, What: err.Error()}
	}
	return m, explain("read", a.file, err)
}

// Meta tells what the run is.
func (a *Archive) Meta() Meta { return a.meta }

// Close ends the use of the archive and gives the folder free.
func (a *Archive) Close() error {
	err := explain("close", a.file, a.db.Close())
	if a.lock != nil {
		err = errors.Join(err, a.lock.release())
	}
	return err
}
