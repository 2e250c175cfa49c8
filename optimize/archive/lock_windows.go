package archive

import (
	"errors"
	"os"

	"golang.org/x/sys/windows"
)

// tryLock locks the file at once or returns errHeld. The byte it locks lies behind the text, which others
// may read.
func tryLock(f *os.File) error {
	const farByte = 1 << 30
	err := windows.LockFileEx(windows.Handle(f.Fd()), windows.LOCKFILE_EXCLUSIVE_LOCK|windows.LOCKFILE_FAIL_IMMEDIATELY,
		0, 1, 0, &windows.Overlapped{Offset: farByte})
	if errors.Is(err, windows.ERROR_LOCK_VIOLATION) {
		return errHeld
	}
	return err
}
