package session

import (
	"errors"
	"os"

	"golang.org/x/sys/windows"
)

// takeLock takes the lock of an open file without waiting. It ends when the file
// is closed, also by the death of the process. The error is errBusy when another
// process holds it.
func takeLock(f *os.File) error {
	const how = windows.LOCKFILE_EXCLUSIVE_LOCK | windows.LOCKFILE_FAIL_IMMEDIATELY
	err := windows.LockFileEx(windows.Handle(f.Fd()), how, 0, 1, 0, new(windows.Overlapped))
	switch {
	case errors.Is(err, windows.ERROR_LOCK_VIOLATION), errors.Is(err, windows.ERROR_IO_PENDING):
		return errBusy
	case err != nil:
		return &os.PathError{Op: "lock", Path: f.Name(), Err: err}
	}
	return nil
}
