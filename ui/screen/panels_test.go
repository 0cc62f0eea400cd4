package screen

import (
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// desk is a screen without a terminal: tests press keys and read lines.
type desk struct {
	*model
	t *testing.T
}

func newDesk(t *testing.T, change ...string) *desk {
	t.Helper()
	s := scenario.Default()
	for i := 0; i < len(change); i += 2 {
		if change[i] == "component" {
			if err := scenario.SetRow(&s, "component", change[i+1], i == 0); err != nil {
				t.Fatal(err)
			}
			continue
		}
		in, ok := scenario.Find(&s, scenario.Path(change[i]))
		if !ok {
			t.Fatalf("no input %s", change[i])
		}
		if err := in.Set(change[i+1]); err != nil {
			t.Fatal(err)
		}
	}
	env := map[string]string{"LANG": "C.UTF-8", "NO_COLOR": "1"}
	m := newModel(Options{Scenario: s, Env: answer.Env{Version: "test"}, Getenv: func(k string) string { return env[k] }})
	m.Update(tea.WindowSizeMsg{Width: 80, Height: 24})
	return &desk{m, t}
}

// named are the keys that tests call by name.
var named = map[string]tea.KeyType{
	"enter": tea.KeyEnter, "esc": tea.KeyEsc, "up": tea.KeyUp, "down": tea.KeyDown, "left": tea.KeyLeft, "right": tea.KeyRight,
	"home": tea.KeyHome, "end": tea.KeyEnd, "pgup": tea.KeyPgUp, "pgdown": tea.KeyPgDown, "tab": tea.KeyTab, "shift+tab": tea.KeyShiftTab,
	"backspace": tea.KeyBackspace, "delete": tea.KeyDelete,
}

// open puts a panel on the desk.
func (d *desk) open(p panel) *desk {
	d.panel = p
	return d
}

// at is the input at a path.
func (d *desk) at(p scenario.Path) scenario.Input {
	d.t.Helper()
	in, ok := scenario.Find(&d.scenario, p)
	if !ok {
		d.t.Fatalf("no input %s", p)
	}
	return in
}

// press presses keys by name; any other text is typed character by character.
// What commands bring back is handed on.
func (d *desk) press(keys ...string) *desk {
	d.t.Helper()
	for _, k := range keys {
		if typ, ok := named[k]; ok {
			d.send(tea.KeyMsg{Type: typ})
			continue
		}
		for _, r := range k {
			d.send(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune{r}})
		}
	}
	return d
}

func (d *desk) paste(text string) *desk {
	d.t.Helper()
	d.send(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune(text), Paste: true})
	return d
}

func (d *desk) send(k tea.KeyMsg) {
	d.t.Helper()
	if d.panel == nil {
		d.t.Fatalf("no panel is open for %q", k)
	}
	next, cmd := d.panel.press(k, d.model)
	d.panel = next
	if cmd != nil {
		d.Update(cmd())
	}
}

// reads is the panel as text.
func (d *desk) reads(w, h int) string {
	d.t.Helper()
	if d.panel == nil {
		return ""
	}
	lines := d.panel.lines(w, h, d.model)
	if len(lines) > h {
		d.t.Errorf("%T: %d lines in %d", d.panel, len(lines), h)
	}
	for _, l := range lines {
		if got := ansi.StringWidth(l); got > w {
			d.t.Errorf("%T: a line of %d columns in %d: %q", d.panel, got, w, l)
		}
	}
	return strings.Join(lines, "\n")
}

// says fails unless the panel reads so.
func (d *desk) says(texts ...string) *desk {
	d.t.Helper()
	got := strings.Join(strings.Fields(d.reads(80, 16)), " ")
	for _, text := range texts {
		if !strings.Contains(got, text) {
			d.t.Errorf("the panel says\n%s\nwant %q", d.reads(80, 16), text)
		}
	}
	return d
}

// shows fails unless the input at a path has that value.
func (d *desk) shows(p scenario.Path, want string) *desk {
	d.t.Helper()
	if got := d.at(p).Show(d.style()); got != want {
		d.t.Errorf("%s is %q, want %q", p, got, want)
	}
	return d
}

// closed fails if a panel is open.
func (d *desk) closed() *desk {
	d.t.Helper()
	if d.panel != nil {
		d.t.Errorf("a %T is still open:\n%s", d.panel, d.reads(80, 16))
	}
	return d
}

// rows opens the composition.
func (d *desk) rows() *desk {
	d.t.Helper()
	l, ok := d.listOf("component")
	if !ok {
		d.t.Fatal("no composition")
	}
	return d.open(newRows(l))
}

// mixture is a desk with two components.
func mixture(t *testing.T) *desk {
	return newDesk(t, "component", "ammonium sulfate share=1", "component", "sodium chloride share=0.25")
}

// every opens each panel, some of them in more than one state.
func every(t *testing.T) map[string]*desk {
	long := strings.Repeat("9", 200)
	return map[string]*desk{
		"entry":           newDesk(t).open(newEntry(newDesk(t).at("dry-diameter"), '2', "")).press("5 um"),
		"long entry":      newDesk(t).open(newEntry(newDesk(t).at("dry-diameter"), 0, long)),
		"refused entry":   newDesk(t).open(newEntry(newDesk(t).at("dry-diameter"), 0, long)).press("enter"),
		"wide entry":      newDesk(t).open(newEntry(newDesk(t).at("dry-diameter"), 0, strings.Repeat("日", 90))).press("enter"),
		"words":           newDesk(t).open(newList(newDesk(t).at("water-activity"))),
		"substances":      newDesk(t).open(newList(newDesk(t).at("component[0].substance"))).press("end"),
		"nothing found":   newDesk(t).open(newList(newDesk(t).at("component[0].substance"))).press(long, "enter"),
		"one component":   newDesk(t).rows(),
		"mixture":         mixture(t).rows().press("tab", "right", "right"),
		"entry in rows":   mixture(t).rows().press(long),
		"refused in rows": mixture(t).rows().press("5 parsec", "enter"),
		"many components": mixture(t).rows().press(strings.Repeat("a", 20)),
		"about":           newDesk(t).open(newAbout(newDesk(t).model)),
		"help":            newDesk(t).open(newHelp(newDesk(t).model)).press("end"),
		"table":           newDesk(t).open(newTable(newDesk(t).model)).press("pgdown"),
		"write":           newDesk(t).open(newWrite(newDesk(t).model)).press(long),
		"no such form":    newDesk(t).open(newWrite(newDesk(t).model)).press(long, ".doc", "enter"),
	}
}

// No panel is wider or higher than what it gets, in any state.
func TestPanelsKeepWithinTheirSpace(t *testing.T) {
	for name, d := range every(t) {
		t.Run(name, func(t *testing.T) {
			for _, ascii := range []bool{false, true} {
				d.t, d.ascii = t, ascii
				for _, w := range []int{1, 20, 60, 79, 100, 200} {
					for _, h := range []int{0, 1, 2, 3, 4, 5, 7, 10, 16, 40} {
						d.reads(w, h)
					}
				}
			}
		})
	}
}

// Pasted text, controls and names of keys spelt out do no harm anywhere.
func TestPanelsTakeAnyText(t *testing.T) {
	for name, d := range every(t) {
		before := d.scenario
		for _, text := range []string{"[B", "enter", "esc", "a\x1b[31mb", "one\ntwo\tthree", "\u202e日本", strings.Repeat("x", 5000)} {
			for _, paste := range []bool{true, false} {
				d.send(tea.KeyMsg{Type: tea.KeyRunes, Runes: []rune(text), Paste: paste})
				if d.panel == nil {
					t.Fatalf("%s: %q closes the panel", name, text)
				}
				if got := d.reads(80, 16); strings.ContainsAny(got, "\x1b\t\u202e") {
					t.Errorf("%s: %q reaches the terminal", name, text)
				}
			}
		}
		if len(scenario.Changes(before, d.scenario)) > 0 {
			t.Errorf("%s: text that is no key changes the scenario", name)
		}
	}
}
