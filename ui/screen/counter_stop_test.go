package screen

import (
	"strings"
	"testing"
	"time"

	tea "github.com/charmbracelet/bubbletea"
)

// underWay presses keys, of which the last one begins work, and returns once some of
// it has been done. Its answer arrives at the channel.
func underWay(t *testing.T, m *model, keys string) <-chan tea.Msg {
	t.Helper()
	cmd := press(m, keys)
	arrived := make(chan tea.Msg)
	go func() { arrived <- answerOf(t, cmd) }()
	for m.work.done.Load() == 0 {
		time.Sleep(time.Millisecond)
	}
	return arrived
}

// The bootstrap is a job: it says how far it is, and Esc keeps the fits and what
// there is of it.
func TestBootstrapIsStopped(t *testing.T) {
	o := onTerminal("plain")
	o.Scenario.Bootstrap = 1000000
	m := opened(o, 80, 24)
	arrived := underWay(t, m, "tab tab tab")
	m.Update(lookAtWork{m.work.revision})
	if view := m.View(); !strings.Contains(view, "Esc stops it") {
		t.Errorf("no progress in\n%s", view)
	}
	press(m, "esc")
	m.Update(<-arrived)
	if view := m.View(); m.work.old || !strings.Contains(view, "stopped; this is what there is so far") || !strings.Contains(view, "S = (0.06393") {
		t.Errorf("stopped:\n%s", view)
	}
	if why := strings.Join(m.answer.Why, " "); !strings.Contains(why, "of 1000000 replicates of the bootstrap were made") {
		t.Errorf("the notes do not say it: %s", why)
	}
}
