package terminal

import (
	"context"
	"errors"
	"fmt"
	"os"
	"syscall"
	"testing"
	"time"
)

func TestExitCode(t *testing.T) {
	for name, c := range map[string]struct {
		cause error
		want  int
	}{
		"SIGHUP":       {Signal{syscall.SIGHUP}, 129},
		"SIGINT":       {Signal{syscall.SIGINT}, 130},
		"os.Interrupt": {Signal{os.Interrupt}, 130},
		"SIGTERM":      {Signal{syscall.SIGTERM}, 143},
		"wrapped":      {fmt.Errorf("the screen: %w", Signal{syscall.SIGTERM}), 143},
		"no cause":     {nil, 0},
		"another one":  {context.Canceled, 1},
	} {
		if got := ExitCode(c.cause); got != c.want {
			t.Errorf("%s: exit code %d, want %d", name, got, c.want)
		}
	}
}

func TestStopEndsTheContext(t *testing.T) {
	ctx, stop := Context(context.Background())
	stop()
	stop()
	<-ctx.Done()
	if cause := context.Cause(ctx); !errors.Is(cause, context.Canceled) {
		t.Errorf("the cause is %v", cause)
	}
}

func TestParentEndsTheContext(t *testing.T) {
	want := errors.New("the parent's reason")
	parent, cancel := context.WithCancelCause(context.Background())
	ctx, stop := Context(parent)
	defer stop()
	cancel(want)
	select {
	case <-ctx.Done():
	case <-time.After(5 * time.Second):
		t.Fatal("the context outlives its parent")
	}
	if cause := context.Cause(ctx); !errors.Is(cause, want) {
		t.Errorf("the cause is %v", cause)
	}
}
