//go:build unix

package terminal

import (
	"errors"
	"time"

	"golang.org/x/sys/unix"
)

// ready reports whether there is something to read within that time.
func (in *Input) ready(within time.Duration) bool {
	end := time.Now().Add(within)
	for {
		fds := []unix.PollFd{{Fd: int32(in.Fd()), Events: unix.POLLIN}}
		n, err := unix.Poll(fds, int(time.Until(end).Milliseconds()))
		if errors.Is(err, unix.EINTR) && time.Now().Before(end) {
			continue
		}
		return err == nil && n > 0 && fds[0].Revents&unix.POLLIN != 0
	}
}
