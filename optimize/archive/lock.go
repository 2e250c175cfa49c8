package archive

import (
	"errors"
	"fmt"
	"io"
	"os"
	"path/filepath"
	"strings"
)

// lock is a lock on a file that the operating system takes back when its process ends, however it ends.
// The file stays, with a word on who had it last.
type lock struct{ file *os.File }

const errHeld = Error("held by another process")

// acquire locks a folder or says who has it.
func acquire(dir string) (*lock, error) {
	name := filepath.Join(dir, lockName)
	f, err := os.OpenFile(name, os.O_RDWR|os.O_CREATE, 0o666)
	if err != nil {
		return nil, explain("open", name, err)
	}
	if err := tryLock(f); err != nil {
		owner, _ := io.ReadAll(io.LimitReader(f, 200)) // the message does without it
		held := errors.Is(err, errHeld)
		err = errors.Join(fmt.Errorf("archive: lock %s: %w", name, err), f.Close())
		if held {
			return nil, &LockedError{Dir: dir, Owner: strings.TrimSpace(string(owner))}
		}
		return nil, err
	}
	host, err := os.Hostname()
	if err != nil {
		host = "a host without a name"
	}
	text := fmt.Sprintf("process %d on %s\n", os.Getpid(), host)
	if err := f.Truncate(0); err != nil {
		return nil, errors.Join(explain("write to", name, err), f.Close())
	}
	if _, err := f.WriteAt([]byte(text), 0); err != nil {
		return nil, errors.Join(explain("write to", name, err), f.Close())
	}
	return &lock{f}, nil
}

// release gives the lock back by closing the file.
func (l *lock) release() error { return l.file.Close() }
