//go:build unix && !race

package terminal_test

import (
	"context"
	"errors"
	"fmt"
	"os"
	"os/exec"
	"os/signal"
	"strings"
	"sync"
	"syscall"
	"testing"
	"time"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/term"
	"github.com/creack/pty"

	_ "dropcrest/ui/dark"
	"dropcrest/ui/terminal"
)

// asChild makes the test binary the small program below.
const asChild = "DROPCREST_TERMINAL_TEST_CHILD"

func TestMain(m *testing.M) {
	if os.Getenv(asChild) != "" {
		os.Exit(child())
	}
	os.Exit(m.Run())
}

// keys is a program that writes down the keys it gets.
type keys struct{ got []string }

func (k keys) Init() tea.Cmd { return nil }

func (k keys) Update(msg tea.Msg) (tea.Model, tea.Cmd) {
	if key, ok := msg.(tea.KeyMsg); ok {
		k.got = append(k.got, key.String())
		if key.String() == "q" {
			return k, tea.Quit
		}
	}
	return k, nil
}

func (k keys) View() string { return fmt.Sprintf("keys:%s.", strings.Join(k.got, ",")) }

func child() int {
	ctx, stop := terminal.Context(context.Background())
	defer stop()
	p := tea.NewProgram(keys{}, tea.WithContext(ctx), tea.WithoutSignalHandler(), tea.WithAltScreen(),
		tea.WithInput(terminal.NewInput(os.Stdin)))
	_, err := p.Run()
	var s terminal.Signal
	switch {
	case errors.As(context.Cause(ctx), &s):
		return terminal.ExitCode(s)
	case err != nil:
		return 1
	}
	return 0
}

// running is the child on a pty.
type running struct {
	t      *testing.T
	cmd    *exec.Cmd
	tty    *os.File
	mu     sync.Mutex
	out    strings.Builder
	cooked *term.State
	done   chan struct{}
}

func start(t *testing.T) *running {
	t.Helper()
	master, slave, err := pty.Open()
	if err != nil {
		t.Skipf("no pty here: %v", err)
	}
	cooked, err := term.GetState(slave.Fd())
	if err != nil {
		t.Fatal(err)
	}
	r := &running{t: t, tty: master, cooked: cooked, done: make(chan struct{})}
	r.cmd = exec.Command(os.Args[0])
	r.cmd.Env = append(os.Environ(), asChild+"=1", "TERM=xterm-256color", "CI=")
	r.cmd.Stdin, r.cmd.Stdout, r.cmd.Stderr = slave, slave, slave
	r.cmd.SysProcAttr = &syscall.SysProcAttr{Setsid: true, Setctty: true}
	if err := r.cmd.Start(); err != nil {
		t.Fatal(err)
	}
	go r.listen()
	t.Cleanup(func() {
		_ = r.cmd.Process.Kill()
		_ = slave.Close()
		_ = master.Close()
		<-r.done
	})
	return r
}

func (r *running) listen() {
	defer close(r.done)
	buf := make([]byte, 4096)
	for {
		n, err := r.tty.Read(buf)
		r.mu.Lock()
		r.out.Write(buf[:n])
		r.mu.Unlock()
		if err != nil {
			return
		}
	}
}

func (r *running) wait(text string) {
	r.t.Helper()
	for end := time.Now().Add(5 * time.Second); time.Now().Before(end); time.Sleep(2 * time.Millisecond) {
		r.mu.Lock()
		found := strings.Contains(r.out.String(), text)
		r.mu.Unlock()
		if found {
			return
		}
	}
	r.t.Fatalf("%q did not appear in %q", text, r.out.String())
}

func (r *running) send(text string) {
	r.t.Helper()
	if _, err := r.tty.WriteString(text); err != nil {
		r.t.Fatal(err)
	}
}

// ends waits for the child and compares its exit code and the terminal it left.
func (r *running) ends(code int) {
	r.t.Helper()
	_ = r.cmd.Wait()
	if got := r.cmd.ProcessState.ExitCode(); got != code {
		r.t.Errorf("exit code %d, want %d", got, code)
	}
	after, err := term.GetState(r.tty.Fd())
	if err != nil {
		r.t.Fatal(err)
	}
	if *after != *r.cooked {
		r.t.Errorf("the terminal was left in another mode")
	}
}

func TestSplitArrowInBubbleTea(t *testing.T) {
	r := start(t)
	r.wait("keys:.")
	began := time.Now()
	r.send("\x1b")
	time.Sleep(15 * time.Millisecond)
	r.send("[B")
	if pause := time.Since(began); pause > 35*time.Millisecond {
		t.Skipf("this machine is too busy to split a key by 15 ms: it took %v", pause)
	}
	r.wait("keys:down.")
	r.send("\x1b")
	r.wait("keys:down,esc.")
	r.send("\x1b[A")
	r.wait("keys:down,esc,up.")
	r.send("q")
	r.ends(0)
}

func TestSignalsRestoreTheTerminal(t *testing.T) {
	for name, s := range map[string]struct {
		signal syscall.Signal
		code   int
	}{
		"SIGTERM": {syscall.SIGTERM, 143},
		"SIGHUP":  {syscall.SIGHUP, 129},
		"SIGINT":  {syscall.SIGINT, 130},
	} {
		t.Run(name, func(t *testing.T) {
			if signal.Ignored(s.signal) {
				t.Skip("these tests were started with the signal ignored, as by nohup, and so is the program")
			}
			r := start(t)
			r.wait("keys:.")
			if err := r.cmd.Process.Signal(s.signal); err != nil {
				t.Fatal(err)
			}
			r.ends(s.code)
			r.wait("\x1b[?1049l")
		})
	}
}
