package screen

import (
	"fmt"
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/scenario"
)

// The dry size is chosen at the start: the first key is of use.
func TestStartsOnTheDrySize(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	if !strings.Contains(m.View(), "<100 nm>") {
		t.Errorf("the first view:\n%s", m.View())
	}
}

func TestStepAndUndo(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	begin := m.scenario
	press(m, "up up up")
	if !(m.scenario.DryDiameter > begin.DryDiameter) || len(m.history.Past) != 1 {
		t.Fatalf("three steps lead to %g m in %d entries", m.scenario.DryDiameter, len(m.history.Past))
	}
	stepped := m.scenario
	press(m, "right down")
	if m.scenario.DrySizeIs != "mobility" || len(m.history.Past) != 2 {
		t.Fatalf("down leads to %s in %d entries", m.scenario.DrySizeIs, len(m.history.Past))
	}
	press(m, "u")
	if !m.scenario.Equal(stepped) || !strings.HasPrefix(m.message, "undone: ") || m.cursor != "dry-size-is" {
		t.Errorf("undo: %v, %q on %s", m.scenario, m.message, m.cursor)
	}
	press(m, "u")
	if !m.scenario.Equal(begin) || !strings.Contains(m.message, "→ 100 nm") && !strings.Contains(m.message, "100 nm →") {
		t.Errorf("undo of a run: %v, %q", m.scenario, m.message)
	}
	press(m, "U U")
	if m.scenario.DrySizeIs != "mobility" {
		t.Errorf("redo leads to %v", m.scenario)
	}
	press(m, "U")
	if m.message != "nothing to redo" {
		t.Errorf("redo at the end says %q", m.message)
	}
}

// What is refused changes nothing: a value out of range, a question without an
// answer, the end of a range.
func TestRefusedChange(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	begin := m.scenario.Clone()
	for name, change := range map[string]func() error{
		"out of range": func() error { return m.set("dry-diameter", "-3 nm") },
		"no input":     func() error { return m.set("dry-diametre", "3 nm") },
		"no answer": func() error {
			return m.edit("component", func(s *scenario.Scenario) error { s.Components[0].Substance = "moonshine"; return nil })
		},
	} {
		if err := change(); err == nil {
			t.Errorf("%s: no error", name)
		}
		if !m.scenario.Equal(begin) || len(m.history.Past) != 0 {
			t.Errorf("%s: the scenario has changed to %v", name, m.scenario)
		}
	}
	if err := m.set("dry-diameter", "10000 nm"); err != nil {
		t.Fatal(err)
	}
	press(m, "up")
	if m.message == "" || m.scenario.DryDiameter != 1e-5 {
		t.Errorf("a step beyond the range leads to %g m and says %q", m.scenario.DryDiameter, m.message)
	}
}

// The cursor keeps its place when its slot leaves the statement.
func TestCursorStays(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	if err := m.set("water-activity", "kappa"); err != nil {
		t.Fatal(err)
	}
	m.jump("kappa")
	if m.cursor != "kappa" {
		t.Fatalf("no slot for kappa: the cursor is on %s", m.cursor)
	}
	press(m, "u")
	if slots := m.slots(); m.cursor == "" || !contains(slots, m.cursor) {
		t.Errorf("the cursor is on %q, the slots are %v", m.cursor, slots)
	}
}

func contains(slots []scenario.Path, p scenario.Path) bool {
	for _, s := range slots {
		if s == p {
			return true
		}
	}
	return false
}

func TestHeldCurves(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "space up space up space up space up space up space")
	letters := ""
	for _, h := range m.held {
		letters += string(h.letter)
	}
	if letters != "ABCDEF" {
		t.Errorf("held %s", letters)
	}
	press(m, "space")
	if len(m.held) != mostHeld || !strings.Contains(m.message, "six") {
		t.Errorf("a seventh: %d held, %q", len(m.held), m.message)
	}
	press(m, "x x space")
	if n := len(m.held); n != 5 || m.held[n-1].letter != 'E' {
		t.Errorf("after two releases and a hold %d are held", n)
	}
	if line := m.heldLine(78); !strings.HasPrefix(line, "held: A 100 nm 0.147 %, B ") {
		t.Errorf("the line of held curves: %q", line)
	}
	press(m, "x x x x x x")
	if len(m.held) != 0 || m.heldLine(78) != "" {
		t.Error("not all are released")
	}
}

// The line of held curves leaves whole curves out, never half a number.
func TestHeldLine(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "space up space up space up space up space up space")
	for w := 30; w < 250; w++ {
		line := m.heldLine(w)
		if ansi.StringWidth(line) > w || strings.Contains(line, "...") {
			t.Fatalf("%d columns: %q", w, line)
		}
		if n := strings.Count(line, " %"); n < 6 && !strings.HasSuffix(line, fmt.Sprintf(", %d more", 6-n)) {
			t.Fatalf("%d columns: %q", w, line)
		}
	}
}

// Lists without rows are not named.
func TestHeldLineNamesTheMatter(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "space")
	if want, got := "held: A 100 nm ammonium sulfate 0.147 %", m.heldLine(78); got != want {
		t.Errorf("the line is %q, want %q", got, want)
	}
}

// Undo leads back to what was held, though the steps were on one slot.
func TestUndoAfterHold(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "up up space up up u")
	if m.scenario.DryDiameter != 120e-9 {
		t.Errorf("undone to %g m", m.scenario.DryDiameter)
	}
}

// A step at the end of a range is no error.
func TestStepAtTheEnd(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "1 enter down")
	if want := "dry size ends at 1 nm"; m.message != want {
		t.Errorf("the message is %q, want %q", m.message, want)
	}
}

// Every other line is shown once, and the last press shows none again.
func TestOtherLines(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	var says []string
	for range len(m.answer.Others) + 2 {
		press(m, "o")
		says = append(says, m.message)
	}
	want := "also: Kelvin only, Raoult only|also: Kelvin only|also: Raoult only|no other lines"
	if got := strings.Join(says, "|"); got != want {
		t.Errorf("o says %s", got)
	}
}

// Pieces of a broken key and pasted text change nothing on a page, but a number
// that is pasted opens an entry; what is typed on a slow line arrives at once and
// counts.
func TestBursts(t *testing.T) {
	for name, c := range map[string]struct {
		key   tea.KeyMsg
		panel bool
		size  float64
	}{
		"piece of down":   {tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune("[B")}, false, 1e-7},
		"piece of home":   {tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune("OH")}, false, 1e-7},
		"piece of pgup":   {tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune("[5~")}, false, 1e-7},
		"pasted number":   {keyOf("paste: 50 nm\n"), true, 1e-7},
		"pasted nothing":  {keyOf("paste:\n"), false, 1e-7},
		"pasted commands": {keyOf("paste:qxu"), false, 1e-7},
		"typed at once":   {keyOf("50"), true, 1e-7},
	} {
		t.Run(name, func(t *testing.T) {
			m := opened(onTerminal("plain"), 80, 24)
			_, cmd := m.Update(c.key)
			if quits(cmd) {
				t.Error("the program ends")
			}
			if (m.panel != nil) != c.panel || m.scenario.DryDiameter != c.size {
				t.Errorf("panel %v, dry size %g m", m.panel, m.scenario.DryDiameter)
			}
		})
	}
	m := opened(onTerminal("plain"), 80, 24)
	m.Update(keyOf("50"))
	press(m, "enter")
	if m.scenario.DryDiameter != 50e-9 {
		t.Errorf("50 typed at once leads to %g m", m.scenario.DryDiameter)
	}
	press(m, "up right down")
	m.Update(keyOf("uuu"))
	if m.scenario.DryDiameter != 100e-9 {
		t.Errorf("u three times at once leads to %g m", m.scenario.DryDiameter)
	}
}

// Esc and another key within a moment are two keys.
func TestEscapeAndKey(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "?")
	m.Update(tea.KeyMsg{Type: tea.KeyUp, Alt: true})
	if m.panel != nil || m.scenario.DryDiameter <= 1e-7 {
		t.Errorf("panel %v, dry size %g m", m.panel, m.scenario.DryDiameter)
	}
}

func TestLeaving(t *testing.T) {
	for _, keys := range []string{"q", "ctrl+c", "? ctrl+c", "5 ctrl+c"} {
		if m := opened(onTerminal("plain"), 80, 24); !quits(press(m, keys)) {
			t.Errorf("%s does not end the program", keys)
		}
	}
	for _, keys := range []string{"esc", "5 q", "z", "right enter q"} {
		if m := opened(onTerminal("plain"), 80, 24); quits(press(m, keys)) {
			t.Errorf("%s ends the program", keys)
		}
	}
	if m := opened(onTerminal("plain"), 20, 5); !quits(press(m, "q")) {
		t.Error("a small window cannot be left")
	}
}

// In a window too small to show anything no key changes anything.
func TestSmallWindowTakesNoKeys(t *testing.T) {
	m := opened(onTerminal("plain"), 40, 10)
	press(m, "up 5 enter space")
	if m.scenario.DryDiameter != 1e-7 || m.panel != nil || len(m.held) != 0 {
		t.Error("a key has changed something that nobody sees")
	}
}

// A key that means nothing changes nothing on the screen: it costs no bytes.
func TestIdleKey(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "up")
	before := m.View()
	press(m, "z")
	if m.View() != before {
		t.Errorf("z changes the screen to\n%s", m.View())
	}
}
