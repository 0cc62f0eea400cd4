//go:build unix && !race

package command_test

import (
	"os"
	"path/filepath"
	"testing"

	"golang.org/x/sys/unix"
)

// ctrl+c ends a command that waits for data which do not come, and leaves nothing
// of its file.
func TestCommandIsStopped(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	data, out := filepath.Join(u.home, "counts.csv"), filepath.Join(u.home, "out.csv")
	if err := unix.Mkfifo(data, 0o600); err != nil {
		t.Skipf("no pipe with a name here: %v", err)
	}
	feed, err := os.OpenFile(data, os.O_RDWR, 0)
	if err != nil {
		t.Fatal(err)
	}
	defer feed.Close()
	if _, err := feed.WriteString("start_time,end_time,ccn at STP @0.2% (cm-3)\n2026-03-14T00:00:00Z,2026-03-14T00:05:00Z,310.5\n"); err != nil {
		t.Fatal(err)
	}
	s := u.run(t, 80, 24, "spectrum", "--data", data, "--record", "all", "--out", out)
	s.until("the file is begun", func() bool {
		begun, _ := filepath.Glob(filepath.Join(u.home, ".out.csv.*.tmp"))
		return len(begun) == 1
	})
	s.types(ctrlC)
	s.ends(130)
	s.restored()
	if left, _ := filepath.Glob(filepath.Join(u.home, "*out*")); len(left) > 0 {
		t.Errorf("left behind: %q", left)
	}
	if left, _ := filepath.Glob(filepath.Join(u.home, ".out*")); len(left) > 0 {
		t.Errorf("left behind: %q", left)
	}
}
