package screen

import (
	"io"
	"os"
	"path/filepath"
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

// With keys alone a person comes from the scans to a record, to the file of the
// calibration, and on to measured counts at calibrated supersaturations.
func TestFromScansToCalibratedCounts(t *testing.T) {
	dir := t.TempDir()
	data := filepath.Join(dir, "counts.csv")
	if err := os.WriteFile(data, []byte("start_time,end_time,temperature difference (K),ccn at STP (cm-3),dN/dlogD at STP 50 nm (cm-3),dN/dlogD at STP 100 nm (cm-3),"+
		"dN/dlogD at STP 200 nm (cm-3)\n2026-03-14T00:00:00Z,2026-03-14T00:05:00Z,10,310,500,500,300\n"), 0o644); err != nil {
		t.Fatal(err)
	}
	o := onTerminal("plain")
	o.Env.Open = func(name string) (io.ReadCloser, error) { return os.Open(name) }
	fitsOnly(&o.Scenario)
	m := opened(o, 80, 24)
	press(m, "tab tab tab")
	for _, name := range []string{"record.txt", "record.pdf", "calibration.json"} {
		press(m, "w")
		m.Update(keyOf("paste:" + filepath.Join(dir, name)))
		m.Update(only(t, press(m, "enter")))
		if info, err := os.Stat(filepath.Join(dir, name)); err != nil || info.Size() == 0 {
			t.Fatalf("%s: %v\n%s", name, err, m.View())
		}
	}
	press(m, "shift+tab shift+tab right enter a")
	m.Update(keyOf("paste:" + data))
	press(m, "enter shift+tab")
	_, cmd := m.Update(keyOf("d"))
	m.Update(answerOf(t, cmd))
	press(m, "esc end left enter")
	chosen := func() scenario.Path {
		r := m.panel.(*rows)
		return r.given[r.row-1]
	}
	for n := 0; chosen() != "calibration"; n++ {
		if n > 50 {
			t.Fatalf("no calibration among the rest:\n%s", m.View())
		}
		press(m, "tab")
	}
	press(m, "enter")
	m.Update(keyOf("paste:" + filepath.Join(dir, "calibration.json")))
	_, cmd = m.Update(keyOf("enter"))
	m.Update(answerOf(t, cmd))
	press(m, "esc end")
	if view := m.View(); m.work.old || !strings.Contains(view, "at 0.587") {
		t.Errorf("the counts are not where the calibration has 10 K:\n%s", view)
	}
	if why := strings.Join(m.answer.Why, " "); !strings.Contains(why, "are not counted twice") {
		t.Errorf("it is not said what cancels: %s", why)
	}
}
