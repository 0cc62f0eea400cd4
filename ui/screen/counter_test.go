package screen

import (
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/scenario"
)

// fitsOnly asks for no bootstrap, so that the answer is there at once.
func fitsOnly(s *scenario.Scenario) { s.Bootstrap = 0 }

// The Counter page as a person sees it: the scans of the demo.
func TestCounterScreens(t *testing.T) {
	for name, c := range map[string]struct {
		terminal string
		w, h     int
		keys     string
	}{
		"line_80x24":            {"plain", 80, 24, ""},
		"line_80x24_ascii":      {"ascii", 80, 24, ""},
		"line_160x48":           {"plain", 160, 48, ""},
		"line_60x18":            {"plain", 60, 18, ""},
		"curves_80x24":          {"plain", 80, 24, "v"},
		"curves_80x24_ascii":    {"ascii", 80, 24, "v"},
		"curves_160x48":         {"plain", 160, 48, "v"},
		"curves_60x18":          {"plain", 60, 18, "v"},
		"residuals_80x24":       {"plain", 80, 24, "v v"},
		"residuals_80x24_ascii": {"ascii", 80, 24, "v v"},
		"residuals_160x48":      {"plain", 160, 48, "v v"},
		"residuals_60x18":       {"plain", 60, 18, "v v"},
		"files_80x24":           {"plain", 80, 24, "enter"},
		"new_file_80x24":        {"plain", 80, 24, "enter a"},
		"further_80x24":         {"plain", 80, 24, "end left enter"},
		"held_80x24":            {"plain", 80, 24, "right right space up"},
		"why_80x24":             {"plain", 80, 24, "end i"},
	} {
		t.Run(name, func(t *testing.T) {
			o := onTerminal(c.terminal)
			fitsOnly(&o.Scenario)
			m := opened(o, c.w, c.h)
			press(m, "tab tab tab "+c.keys)
			if m.question.Key != "counter" || m.work.cancel != nil {
				t.Fatalf("the page is %s, working %t", m.question.Key, m.work.cancel != nil)
			}
			view := m.View()
			golden.RequireEqual(t, []byte(view+"\n"))
			if c.terminal == "ascii" && strings.ContainsFunc(view, func(r rune) bool { return r > '~' }) {
				t.Error("the locale is ASCII and the screen is not")
			}
		})
	}
}

// The bootstrap is a job: it says how far it is, and Esc keeps the fits and what
// there is of it.
func TestBootstrapIsStopped(t *testing.T) {
	o := onTerminal("plain")
	o.Scenario.Bootstrap = 1000000
	m := opened(o, 80, 24)
	press(m, "tab tab")
	_, cmd := m.Update(keyOf("tab"))
	arrived := make(chan tea.Msg)
	go func() { arrived <- answerOf(t, cmd) }()
	for m.work.done.Load() == 0 { // some replicates must have been made
	}
	m.Update(lookAtWork{m.work.revision})
	if view := m.View(); !strings.Contains(view, "working   0 % [..........] Esc stops it") {
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
