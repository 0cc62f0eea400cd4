//go:build darwin || dragonfly || freebsd || linux || netbsd || openbsd

package session

import (
	"errors"
	"os"

	"golang.org/x/sys/unix"
)

// takeLock takes the lock of an open file without waiting. It ends when the file
// is closed, also by the death of the process. The error is errBusy when another
// process holds it.
func takeLock(f *os.File) error {
	for {
		err := unix.Flock(int(f.Fd()), unix.LOCK_EX|unix.LOCK_NB)
		switch {
		case errors.Is(err, unix.EINTR):
			continue
		case errors.Is(err, unix.EWOULDBLOCK):
			return errBusy
		case err != nil:
			return &os.PathError{Op: "lock", Path: f.Name(), Err: err}
		}
		return nil
	}
}
