//go:build unix && !race

package command_test

import (
	"fmt"
	"os"
	"os/exec"
	"os/signal"
	"regexp"
	"strings"
	"syscall"
	"testing"
	"time"

	"dropcrest/ui/scenario"
	"dropcrest/ui/terminal"
)

// The whole program on a real terminal, seen through an emulator. Left out under
// the race detector, which makes a program too slow to be timed.

// slot is the dry size in the statement while it is the chosen slot.
const slot = `<([0-9.]+) nm>`

// query is what a program sends to ask a terminal something: colours (OSC 10 and
// 11), cursor position, device attributes, modes, capabilities.
var query = regexp.MustCompile("\x1b\\](?:10|11|4;[0-9]+);\\?|\x1b\\[\\??6n|\x1b\\[[>=]?0?c|\x1b\\[\\??[0-9]+\\$p|\x1bP[+$]q")

// A terminal that answers nothing is asked nothing, and nobody waits for it.
func TestMuteTerminal(t *testing.T) {
	for name, c := range map[string]struct {
		args []string
		sees string
		ends bool
	}{
		"screen":    {nil, "dry particle", false},
		"--version": {[]string{"--version"}, "dropcrest", true},
		"curve":     {[]string{"curve"}, "activates", true},
	} {
		t.Run(name, func(t *testing.T) {
			s := newUser(t).run(t, 80, 24, c.args...)
			s.sees(c.sees)
			took := s.first.Sub(s.started)
			t.Logf("first output after %v", took.Round(100*time.Microsecond))
			if took > time.Second {
				t.Errorf("the first output comes after %v: it waits for the terminal", took)
			}
			if c.ends {
				s.ends(0)
			}
			if q := query.Find(s.bytes()); q != nil {
				t.Errorf("the terminal is asked %q", q)
			}
		})
	}
}

// The screen says what the command says.
func TestCrestOnScreen(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	s := u.run(t, 80, 24)
	seen := s.sees(`at ([0-9.]+) % supersaturation`)[1]

	var answer struct {
		S float64 `json:"critical_supersaturation_percent"`
	}
	u.facts(t, "curve", &answer)
	agrees(t, seen, answer.S)
}

// An arrow key that arrives in two pieces is one arrow key; pieces that arrive
// too late, or alone, do no harm.
func TestSplitArrow(t *testing.T) {
	t.Parallel()
	s := newUser(t).run(t, 80, 24)
	before := s.sees(slot)[1]
	s.types(down)
	after := becomesOther(s, before)
	s.types(up)
	if back := becomesOther(s, after); back != before {
		t.Fatalf("down leads from %s to %s nm, up to %s nm", before, after, back)
	}

	began := time.Now()
	s.types("\x1b")
	time.Sleep(15 * time.Millisecond)
	s.types("[B")
	if pause := time.Since(began); pause > 35*time.Millisecond {
		t.Skipf("this machine is too busy to split a key by 15 ms: it took %v", pause)
	}
	if got := becomesOther(s, before); got != after {
		t.Errorf("a split down leads from %s to %s nm, want %s nm", before, got, after)
	}
	for _, stray := range []string{"[B", escape, "[", "OB"} {
		s.types(stray)
		s.rests()
		if got := s.sees(slot)[1]; got != after {
			t.Errorf("%q leads from %s to %s nm", stray, after, got)
		}
	}
}

// becomesOther waits until the chosen slot shows another value, however busy the
// machine is.
func becomesOther(s *tty, than string) string {
	s.t.Helper()
	var now string
	s.until("the value changes", func() bool {
		m := regexp.MustCompile(slot).FindStringSubmatch(s.words())
		if m != nil {
			now = m[1]
		}
		return m != nil && now != than
	})
	s.rests()
	return now
}

// However the program ends, the terminal is given back and the session is there.
func TestEveryEnd(t *testing.T) {
	for name, c := range map[string]struct {
		end  func(*tty)
		code int
	}{
		"q":       {func(s *tty) { s.types("q") }, 0},
		"ctrl+c":  {func(s *tty) { s.types(ctrlC) }, 0},
		"SIGINT":  {func(s *tty) { s.signal(syscall.SIGINT) }, terminal.ExitCode(terminal.Signal{Signal: syscall.SIGINT})},
		"SIGTERM": {func(s *tty) { s.signal(syscall.SIGTERM) }, 143},
		"SIGHUP":  {func(s *tty) { s.signal(syscall.SIGHUP) }, 129},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			if name == "SIGHUP" && signal.Ignored(syscall.SIGHUP) {
				t.Skip("these tests were started with the signal ignored, as by nohup, and so is the program")
			}
			u := newUser(t)
			s := u.run(t, 80, 24)
			value := changed(s)
			c.end(s)
			s.ends(c.code)
			s.restored()
			resumes(t, u, value)
		})
	}
}

// changed changes the dry size and returns the value on the screen.
func changed(s *tty) string {
	s.t.Helper()
	before := s.sees(slot)[1]
	s.types(up + up + up)
	var now string
	s.until("the dry size changes", func() bool {
		m := regexp.MustCompile(slot).FindStringSubmatch(s.words())
		if m == nil || m[1] == before || m[1] != now {
			if m != nil {
				now = m[1]
			}
			return false
		}
		return true
	})
	s.rests()
	return s.sees(slot)[1]
}

// resumes starts the program again and takes up the session.
func resumes(t *testing.T, u user, value string) {
	t.Helper()
	s := u.run(t, 80, 24)
	s.sees(`(?i)enter.*(resume|go on|take)`)
	s.types(enter)
	s.sees(regexp.QuoteMeta(value) + " nm")
	s.types("q")
	s.ends(0)
	s.restored()
}

// kill -9 asks nobody; what was changed is on the disk already.
func TestKill9(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	s := u.run(t, 80, 24)
	value := changed(s)
	began := time.Now()
	s.until("the change is saved", func() bool { return savedSize(u) == value })
	t.Logf("saved %v after the screen came to rest", time.Since(began).Round(time.Millisecond))
	s.signal(syscall.SIGKILL)
	s.ends(-1)
	resumes(t, u, value)
}

// savedSize is the dry size in the user's scenario.toml, written as a slot writes
// it, or nothing when there is none.
func savedSize(u user) string {
	f, err := os.Open(u.stateFile("scenario.toml"))
	if err != nil {
		return ""
	}
	defer f.Close()
	saved, err := scenario.Decode(f.Name(), f)
	if err != nil {
		return ""
	}
	return fmt.Sprintf("%.4g", saved.DryDiameter*1e9)
}

// panics is the name under which the test binary is dropcrest with a model that
// panics at the key "P".
const panics = "dropcrest-panics"

// A fault of the program gives the terminal back too, and the session is there.
func TestForcedPanic(t *testing.T) {
	t.Parallel()
	if _, err := exec.LookPath(panics); err != nil {
		t.Skip("TestMain knows no " + panics)
	}
	u := newUser(t)
	s := u.runAs(t, panics, 80, 24)
	value := changed(s)
	s.types("P")
	s.ends(1)
	s.restored()
	resumes(t, u, value)
}

// The line drops: the terminal itself is gone.
func TestLineDrops(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	s := u.run(t, 80, 24)
	value := changed(s)
	s.hangUp()
	s.ends(129)
	resumes(t, u, value)
}

func TestWindowSizes(t *testing.T) {
	t.Parallel()
	s := newUser(t).run(t, 20, 5)
	s.rests()
	s.until("one line says that the window is too small", func() bool {
		return len(strings.Fields(s.shows())) > 0 && strings.Count(strings.TrimSpace(s.shows()), "\n") == 0
	})
	for _, size := range [][2]int{{80, 24}, {60, 18}, {160, 48}, {10, 3}, {1, 1}, {80, 24}} {
		s.size(size[0], size[1])
		if size[0] >= 60 {
			s.sees("dry particle")
			s.sees("supersaturation")
		}
		s.rests()
	}
	s.types("q")
	s.ends(0)
	s.restored()
}

// Two programs on one session: the second says that it keeps nothing.
func TestTwoInstances(t *testing.T) {
	t.Parallel()
	u := newUser(t)
	first := u.run(t, 80, 24)
	value := changed(first)
	second := u.run(t, 80, 24)
	second.sees(`(?i)another dropcrest|does not own|not be saved|not kept`)
	second.types(escape)
	second.rests()
	second.types(down + down + down + down + down)
	second.rests()
	second.types("q")
	second.ends(0)
	second.restored()
	first.types("q")
	first.ends(0)
	resumes(t, u, value)
}

// What a key costs on a slow line. The goals are those of the issue; a cost of
// twice the goal is a fault.
func TestBytesPerKey(t *testing.T) {
	t.Parallel()
	s := newUser(t).run(t, 80, 24)
	s.sees(slot)
	s.rests()
	t.Logf("first picture: %d bytes", len(s.bytes()))
	check := func(what string, goal int, keys ...string) {
		t.Helper()
		worst, sum := 0, 0
		for _, k := range keys {
			n := s.costs(k)
			worst, sum = max(worst, n), sum+n
		}
		t.Logf("%s: %d bytes on average, %d at most (goal %d)", what, sum/len(keys), worst, goal)
		if sum/len(keys) > 2*goal {
			t.Errorf("%s costs %d bytes on average, more than twice the goal of %d", what, sum/len(keys), goal)
		}
	}
	check("move between slots", 250, right, right, right, left, left, left)
	check("changed slot", 1200, up, up, up, down, down)
	check("changed slot, frame refitted", 1600, "\x1b[5~", "\x1b[5~", "\x1b[6~")
	check("a key that means nothing", 20, "z")
}
