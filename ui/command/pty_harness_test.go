//go:build unix && !race

package command_test

import (
	"bytes"
	"encoding/json"
	"fmt"
	"io"
	"os"
	"os/exec"
	"path/filepath"
	"regexp"
	"strings"
	"sync"
	"sync/atomic"
	"syscall"
	"testing"
	"time"

	"github.com/charmbracelet/x/term"
	"github.com/charmbracelet/x/vt"
	"github.com/creack/pty"
	"golang.org/x/sys/unix"
)

// patience is how long a test waits for what must come. Nothing is measured with
// it: a busy machine only makes a test slower.
const patience = 10 * time.Second

// user is somebody with a home folder of their own, so that no test meets the
// session of another.
type user struct{ home string }

func newUser(t *testing.T) user {
	t.Helper()
	if os.Getenv(started) != "" {
		t.Fatal("the program started by a test is the test itself: TestMain must run dropcrest under that name")
	}
	return user{t.TempDir()}
}

// started is set for every program that a test has started, so that a test binary
// that fails to become dropcrest does not start itself without end.
const started = "DROPCREST_STARTED_BY_TEST"

// stateFile is the path of a file of the user's session.
func (u user) stateFile(name string) string {
	return filepath.Join(u.home, "state", "dropcrest", name)
}

// env is a terminal that an ordinary test never has: xterm-256color without CI,
// on which Bubble Tea would ask for the background. The demo is there, as it is for
// everybody.
func (u user) env() []string {
	demo, err := filepath.Abs("../../testdata/demo")
	if err != nil {
		panic(err)
	}
	return []string{
		"HOME=" + u.home, "XDG_STATE_HOME=" + filepath.Join(u.home, "state"), "TMPDIR=" + u.home,
		"PATH=" + os.Getenv("PATH"), "TERM=xterm-256color", "LANG=C.UTF-8", started + "=1", demoFolder + "=" + demo,
	}
}

// facts are what a command answers as JSON.
func (u user) facts(t *testing.T, command string, into any) {
	t.Helper()
	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	out, err := (&exec.Cmd{Path: self, Args: []string{"dropcrest", command, "--as", "json"}, Env: u.env()}).Output()
	if err != nil {
		t.Fatal(err)
	}
	if err := json.Unmarshal(out, into); err != nil {
		t.Fatal(err)
	}
}

// agrees tells whether the screen shows a number of the command, to the digits that
// it shows.
func agrees(t *testing.T, shown string, x float64) {
	t.Helper()
	_, decimals, _ := strings.Cut(shown, ".")
	if want := fmt.Sprintf("%.*f", len(decimals), x); shown != want {
		t.Errorf("the screen says %s, the command %v", shown, x)
	}
}

// tty is dropcrest on a terminal that shows everything and answers nothing.
type tty struct {
	t       *testing.T
	cmd     *exec.Cmd
	master  *os.File
	slave   *os.File
	cooked  *term.State
	started time.Time
	ended   chan struct{} // closed when the program has ended
	over    chan struct{} // closed when nobody listens any more
	gone    atomic.Bool

	mu    sync.Mutex
	emu   *vt.Emulator
	raw   []byte
	first time.Time // of the first output
	last  time.Time // of the last output
}

// run starts dropcrest with these arguments on a terminal of that size. The test
// binary runs itself: under the name dropcrest it is the program.
func (u user) run(t *testing.T, width, height int, args ...string) *tty {
	t.Helper()
	return u.runAs(t, "dropcrest", width, height, args...)
}

func (u user) runAs(t *testing.T, name string, width, height int, args ...string) *tty {
	t.Helper()
	master, slave, err := pty.Open()
	if err != nil {
		t.Skipf("no pty here: %v", err)
	}
	s := &tty{t: t, master: master, slave: slave, ended: make(chan struct{}), over: make(chan struct{}), emu: vt.NewEmulator(width, height)}
	if s.cooked, err = term.GetState(slave.Fd()); err != nil {
		t.Fatal(err)
	}
	s.size(width, height)
	self, err := os.Executable()
	if err != nil {
		t.Fatal(err)
	}
	s.cmd = &exec.Cmd{
		Path: self, Args: append([]string{name}, args...), Env: u.env(),
		Stdin: slave, Stdout: slave, Stderr: slave,
		SysProcAttr: &syscall.SysProcAttr{Setsid: true, Setctty: true},
	}
	// A mute terminal: what the emulator would answer goes nowhere.
	go func() { _, _ = io.Copy(io.Discard, s.emu) }()
	s.started = time.Now()
	if err := s.cmd.Start(); err != nil {
		t.Fatal(err)
	}
	go func() { defer close(s.ended); _ = s.cmd.Wait() }()
	go s.listen()
	t.Cleanup(s.close)
	return s
}

func (s *tty) close() {
	_ = s.cmd.Process.Kill()
	<-s.ended
	s.hangUp()
	_ = s.emu.Close()
}

// hangUp takes the terminal away, as a dropped line does.
func (s *tty) hangUp() {
	s.gone.Store(true)
	<-s.over
	_ = s.slave.Close()
	_ = s.master.Close()
}

func (s *tty) listen() {
	defer close(s.over)
	buf := make([]byte, 1<<16)
	for !s.gone.Load() {
		// A read that waits would keep the terminal open when it is closed.
		fds := []unix.PollFd{{Fd: int32(s.master.Fd()), Events: unix.POLLIN}}
		if ready, _ := unix.Poll(fds, 20); ready <= 0 {
			continue
		}
		n, err := s.master.Read(buf)
		if n > 0 {
			s.mu.Lock()
			s.last = time.Now()
			if s.raw == nil {
				s.first = s.last
			}
			s.raw = append(s.raw, buf[:n]...)
			_, _ = s.emu.Write(buf[:n])
			s.mu.Unlock()
		}
		if err != nil {
			return
		}
	}
}

// size makes the window that large and tells the program.
func (s *tty) size(width, height int) {
	s.t.Helper()
	s.mu.Lock()
	s.emu.Resize(width, height)
	s.mu.Unlock()
	if err := pty.Setsize(s.master, &pty.Winsize{Cols: uint16(width), Rows: uint16(height)}); err != nil {
		s.t.Fatal(err)
	}
}

// shows is what a person sees, without the blanks at the ends of lines.
func (s *tty) shows() string {
	s.mu.Lock()
	defer s.mu.Unlock()
	lines := strings.Split(s.emu.String(), "\n")
	for i, line := range lines {
		lines[i] = strings.TrimRight(line, " \r")
	}
	return strings.Join(lines, "\n")
}

// words is what a person reads, as one line with single blanks: a sentence may be
// broken anywhere.
func (s *tty) words() string { return strings.Join(strings.Fields(s.shows()), " ") }

// bytes returns all output so far.
func (s *tty) bytes() []byte {
	s.mu.Lock()
	defer s.mu.Unlock()
	return bytes.Clone(s.raw)
}

// until waits for a condition and fails the test if it does not come true.
func (s *tty) until(what string, is func() bool) {
	s.t.Helper()
	end := time.Now().Add(patience)
	for watched := false; !is(); time.Sleep(2 * time.Millisecond) {
		select {
		case <-s.ended:
			// Nothing more will come than what is on its way.
			if !watched {
				watched, end = true, time.Now().Add(200*time.Millisecond)
			}
		default:
		}
		if time.Now().After(end) {
			s.t.Fatalf("%s: this does not come. The screen shows\n%s", what, s.shows())
		}
	}
}

// sees waits until the pattern stands on the screen and returns its groups.
func (s *tty) sees(pattern string) []string {
	s.t.Helper()
	re := regexp.MustCompile(pattern)
	var found []string
	s.until("want "+pattern, func() bool {
		words := s.words()
		if strings.Contains(words, "the screen is not part of this build") {
			s.t.Skip("this build has no screen")
		}
		found = re.FindStringSubmatch(words)
		return found != nil
	})
	return found
}

// rests waits until nothing has come for a while: the answer to a key is drawn.
func (s *tty) rests() {
	s.t.Helper()
	const quiet = 80 * time.Millisecond
	begin := time.Now()
	s.until("the screen comes to rest", func() bool {
		s.mu.Lock()
		defer s.mu.Unlock()
		return time.Since(begin) > quiet && time.Since(s.last) > quiet
	})
}

// types sends keys as the terminal would.
func (s *tty) types(keys string) {
	s.t.Helper()
	if _, err := s.master.WriteString(keys); err != nil {
		s.t.Fatal(err)
	}
}

// Keys as xterm sends them.
const (
	up     = "\x1b[A"
	down   = "\x1b[B"
	right  = "\x1b[C"
	left   = "\x1b[D"
	escape = "\x1b"
	enter  = "\r"
	ctrlC  = "\x03"
)

// costs presses a key and returns how many bytes the program sent for it.
func (s *tty) costs(key string) int {
	s.t.Helper()
	s.rests()
	before := len(s.bytes())
	s.types(key)
	s.rests()
	return len(s.bytes()) - before
}

func (s *tty) signal(sig syscall.Signal) {
	s.t.Helper()
	if err := s.cmd.Process.Signal(sig); err != nil {
		s.t.Fatal(err)
	}
}

// ends waits for the program to end and compares its exit code.
func (s *tty) ends(code int) {
	s.t.Helper()
	select {
	case <-s.ended:
	case <-time.After(patience):
		_ = s.cmd.Process.Kill()
		<-s.ended
		s.t.Fatalf("the program did not end within %v. The screen shows\n%s", patience, s.shows())
	}
	if got := s.cmd.ProcessState.ExitCode(); got != code {
		s.t.Errorf("exit code %d, want %d. The screen shows\n%s", got, code, s.shows())
	}
}

// restored checks that the terminal is as the program found it: the ordinary
// screen, a visible cursor, no paste marks, the line discipline as it was.
func (s *tty) restored() {
	s.t.Helper()
	s.until("the ordinary screen with its cursor", func() bool {
		s.mu.Lock()
		defer s.mu.Unlock()
		return !s.emu.IsAltScreen() && !s.emu.CursorHidden()
	})
	raw := string(s.bytes())
	if on, off := strings.LastIndex(raw, "\x1b[?2004h"), strings.LastIndex(raw, "\x1b[?2004l"); on > off {
		s.t.Error("pasted text stays in marks")
	}
	now, err := term.GetState(s.slave.Fd())
	if err != nil {
		s.t.Fatal(err)
	}
	if *now != *s.cooked {
		s.t.Error("the terminal was left in raw mode")
	}
}
