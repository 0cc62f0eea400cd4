package screen

import (
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/scenario"
)

// sight is one screen that a person comes to.
type sight struct {
	terminal string
	w, h     int
	keys     string
	from     func(*scenario.Scenario) // nil: as it starts
}

// look compares sights with the golden ones; before are the keys that lead to all of
// them.
func look(t *testing.T, before string, sights map[string]sight) {
	t.Helper()
	for name, c := range sights {
		t.Run(name, func(t *testing.T) {
			o := onTerminal(c.terminal)
			if c.from != nil {
				c.from(&o.Scenario)
			}
			m := opened(o, c.w, c.h)
			worked(t, m, press(m, before+c.keys))
			view := m.View()
			golden.RequireEqual(t, []byte(view+"\n"))
			if c.terminal != "colour" && strings.Contains(view, "\x1b") {
				t.Error("NO_COLOR is set and the screen has an escape sequence")
			}
			if c.terminal == "ascii" && strings.ContainsFunc(view, func(r rune) bool { return r > '~' }) {
				t.Error("the locale is ASCII and the screen is not")
			}
		})
	}
}

// worked brings the answer of the last key where that is worked out beside the keys.
func worked(t *testing.T, m *model, cmd tea.Cmd) {
	t.Helper()
	if m.work.cancel != nil {
		m.Update(answerOf(t, cmd))
		m.View()
	}
}
