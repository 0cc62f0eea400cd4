package screen

import (
	"errors"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"time"

	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/scenario"
	"dropcrest/ui/session"
)

// someTime is a moment for states; nothing depends on it.
var someTime = time.Date(2025, 3, 4, 15, 16, 0, 0, time.Local)

// withStore is the screen on a session folder as the command line opens it.
func withStore(t *testing.T, dir string) Options {
	t.Helper()
	o := onTerminal("plain")
	o.Store, o.Last, o.Found, o.Note = session.Open(dir)
	t.Cleanup(func() { _ = o.Store.Close() })
	return o
}

// leave ends a screen as Run does.
func leave(t *testing.T, m *model, o Options, fault bool) {
	t.Helper()
	if err := m.last(fault, someTime); err != nil {
		t.Fatal(err)
	}
	if err := o.Store.Close(); err != nil {
		t.Fatal(err)
	}
}

// keptSession leaves a session with a changed size and a held curve in a folder.
func keptSession(t *testing.T) (dir string, left scenario.Scenario) {
	t.Helper()
	dir = t.TempDir()
	o := withStore(t, dir)
	m := opened(o, 80, 24)
	press(m, "space up up right")
	leave(t, m, o, false)
	return dir, m.scenario
}

func TestResume(t *testing.T) {
	dir, left := keptSession(t)
	o := withStore(t, dir)
	m := opened(o, 80, 24)
	if want := "Enter: go on with the session of 4 March 15:16"; !strings.Contains(m.View(), want) {
		t.Fatalf("no offer %q in\n%s", want, m.View())
	}
	if !m.scenario.Equal(scenario.Default()) {
		t.Error("the session is taken up before anybody said so")
	}
	press(m, "enter")
	if !m.scenario.Equal(left) || len(m.held) != 1 || m.held[0].letter != 'A' || m.cursor != "dry-size-is" {
		t.Errorf("resumed: %v, %d held, cursor on %s", m.scenario, len(m.held), m.cursor)
	}
	press(m, "u")
	if !m.scenario.Equal(scenario.Default()) {
		t.Errorf("undo after a resume leads to %v", m.scenario)
	}
}

// Esc and the first change are a no: the session is put aside, and the key acts.
func TestDecline(t *testing.T) {
	for keys, size := range map[string]float64{"esc": 1e-7, "up": 1.1e-7, "5 0 enter": 5e-8, "space": 1e-7} {
		dir, _ := keptSession(t)
		m := opened(withStore(t, dir), 80, 24)
		press(m, keys)
		if m.offered != nil || m.scenario.DryDiameter != size {
			t.Errorf("%s: offered %v, dry size %g m", keys, m.offered != nil, m.scenario.DryDiameter)
		}
		if _, err := os.Stat(filepath.Join(dir, "scenario-before.toml")); err != nil {
			t.Errorf("%s: the session was not put aside: %v", keys, err)
		}
	}
}

// Keys that only look are no answer: the offer stands, and is on the screen.
func TestOfferStands(t *testing.T) {
	for _, keys := range []string{"y", "right", "? esc", "end i esc", "t esc", "o", "u", "5 esc", "w a esc"} {
		dir, left := keptSession(t)
		m := opened(withStore(t, dir), 80, 24)
		press(m, keys)
		press(m, "home") // what a key says stands in place of the offer until the next key
		if m.offered == nil || !strings.Contains(m.View(), "Enter: go on with the session") {
			t.Errorf("%s: no offer in\n%s", keys, m.View())
			continue
		}
		press(m, "enter")
		if !m.scenario.Equal(left) {
			t.Errorf("%s: Enter does not take the session up", keys)
		}
	}
}

// Who leaves without an answer is asked again.
func TestOfferedAgain(t *testing.T) {
	dir, left := keptSession(t)
	for _, keys := range []string{"q", "ctrl+c", ""} {
		o := withStore(t, dir)
		m := opened(o, 80, 24)
		press(m, keys)
		leave(t, m, o, false)
	}
	o := withStore(t, dir)
	if !o.Found || !o.Last.Scenario.Equal(left) {
		t.Error("the session is gone")
	}
}

// A scenario from a file is not asked about, and the session is put aside only
// when there is something new to keep.
func TestGivenScenario(t *testing.T) {
	dir, left := keptSession(t)
	o := withStore(t, dir)
	o.Given = true
	m := opened(o, 80, 24)
	if m.offered != nil {
		t.Error("the session is offered")
	}
	press(m, "right")
	leave(t, m, o, false)

	o = withStore(t, dir)
	if !o.Last.Scenario.Equal(left) {
		t.Fatal("looking at a file has overwritten the session")
	}
	o.Given = true
	m = opened(o, 80, 24)
	press(m, "up")
	if _, err := os.Stat(filepath.Join(dir, "session-before.json")); err != nil {
		t.Errorf("the session was not put aside: %v", err)
	}
}

// Changes are saved once for many, by a command that Update hands out.
func TestAutosave(t *testing.T) {
	dir := t.TempDir()
	o := withStore(t, dir)
	m := opened(o, 80, 24)
	if _, cmd := m.Update(keyOf("up")); cmd == nil {
		t.Fatal("a change is not going to be saved")
	}
	for range 5 {
		if _, cmd := m.Update(keyOf("up")); cmd != nil {
			t.Error("a second save is on its way")
		}
	}
	_, cmd := m.Update(keepNow{someTime})
	if cmd == nil {
		t.Fatal("nothing is saved")
	}
	m.Update(only(t, cmd))
	if m.keeper.complain != "" {
		t.Error(m.keeper.complain)
	}
	if _, err := os.Stat(filepath.Join(dir, "scenario.toml")); err != nil {
		t.Error(err)
	}
	if _, cmd := m.Update(keyOf("up")); cmd == nil {
		t.Error("the next change is not going to be saved")
	}
}

// only runs a command, or the only one of a batch, and returns its message.
func only(t *testing.T, cmd tea.Cmd) tea.Msg {
	t.Helper()
	msg := cmd()
	if batch, ok := msg.(tea.BatchMsg); ok {
		if len(batch) != 1 {
			t.Fatalf("%d commands, want one", len(batch))
		}
		msg = batch[0]()
	}
	return msg
}

// An error of saving is said once, and again after it had gone.
func TestSaveErrors(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	full := errors.New("no space left on the disk")
	for i, c := range []struct {
		err  error
		says string
	}{{full, full.Error()}, {full, ""}, {nil, ""}, {full, full.Error()}} {
		m.message = ""
		m.Update(kept{c.err})
		if m.message != c.says {
			t.Errorf("save %d: %q, want %q", i, m.message, c.says)
		}
	}
}

// After a fault the last state that was drawn is saved, not the one that could
// not be.
func TestFaultKeepsWhatWasDrawn(t *testing.T) {
	dir := t.TempDir()
	o := withStore(t, dir)
	m := opened(o, 80, 24)
	press(m, "up")
	drawn := m.scenario
	m.Update(keyOf("pgup")) // and the view of it would panic
	leave(t, m, o, true)
	if o = withStore(t, dir); !o.Last.Scenario.Equal(drawn) {
		t.Errorf("kept %g m, want %g m", o.Last.Scenario.DryDiameter, drawn.DryDiameter)
	}
}

// The second of two programs says that it keeps nothing, and offers nothing.
func TestSecondInstance(t *testing.T) {
	dir, left := keptSession(t)
	withStore(t, dir)
	second := withStore(t, dir)
	m := opened(second, 80, 24)
	if !strings.Contains(m.View(), "another dropcrest owns the session; this one will not be saved") {
		t.Errorf("the second says nothing:\n%s", m.View())
	}
	press(m, "enter up")
	leave(t, m, second, false)
	if _, last, _, _ := session.Open(dir); !last.Scenario.Equal(left) {
		t.Error("the second has saved")
	}
}
