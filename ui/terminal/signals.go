package terminal

import (
	"context"
	"errors"
	"os"
	"os/signal"
	"sync"
	"syscall"
)

// A Signal is the cause of a context that a signal has cancelled.
type Signal struct{ os.Signal }

func (s Signal) Error() string { return "stopped by signal: " + s.String() }

// Context returns a copy of parent that ends when the process receives SIGINT,
// SIGTERM or SIGHUP; context.Cause is then a Signal. Bubble Tea restores the
// terminal when its context ends, which it does not do by itself on SIGHUP.
//
// After the first of these signals a second SIGINT or SIGTERM ends the process
// at once, so that a program that hangs can still be stopped. A second SIGHUP
// does nothing: when a window is closed kernel and shell may both send one, and
// the session is just being saved. A SIGHUP that was ignored at the start, as
// under nohup, stays ignored.
//
// stop gives the signals back; calling it more than once does no harm.
func Context(parent context.Context) (ctx context.Context, stop func()) {
	ctx, cancel := context.WithCancelCause(parent)
	end := make(chan os.Signal, 1)
	hangup := make(chan os.Signal, 1)
	signal.Notify(end, syscall.SIGINT, syscall.SIGTERM)
	if !signal.Ignored(syscall.SIGHUP) {
		signal.Notify(hangup, syscall.SIGHUP)
	}
	go func() {
		select {
		case s := <-end:
			cancel(Signal{s})
		case s := <-hangup:
			cancel(Signal{s})
		case <-ctx.Done():
		}
		signal.Stop(end)
	}()
	stop = sync.OnceFunc(func() {
		cancel(context.Canceled)
		signal.Stop(end)
		signal.Stop(hangup)
	})
	return ctx, stop
}

// ExitCode is the exit code that shells expect of a program that a signal has
// ended, 128 and the number of the signal: 129 for SIGHUP, 130 for SIGINT, 143
// for SIGTERM. Any other cause is 1, no cause 0.
func ExitCode(cause error) int {
	var s Signal
	if errors.As(cause, &s) {
		if n, ok := s.Signal.(syscall.Signal); ok {
			return 128 + int(n)
		}
	}
	if cause == nil {
		return 0
	}
	return 1
}
