package screen

import (
	"io"
	"os"
	"strings"
	"testing"

	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// From the salt scans to a calibration file, and on to the counts of the Spectrum
// page, by keys alone.
func TestFromScansToCounts(t *testing.T) {
	t.Chdir(t.TempDir())
	o := onTerminal("plain")
	o.Scenario.Bootstrap = 0
	o.Env.Open = func(name string) (io.ReadCloser, error) { return os.Open(name) }
	m := opened(o, 80, 24)
	press(m, "tab tab tab")
	var run func(tea.Cmd)
	run = func(cmd tea.Cmd) {
		if cmd == nil {
			return
		}
		switch msg := cmd().(type) {
		case tea.BatchMsg:
			for _, c := range msg {
				run(c)
			}
		default:
			m.Update(msg)
		}
	}
	run(press(m, "w c a l . j s o n enter"))
	press(m, "esc")
	if _, err := os.Stat("cal.json"); err != nil {
		t.Fatalf("%v:\n%s", err, m.View())
	}
	press(m, "shift+tab shift+tab end left enter") // the Spectrum page, all else
	before := strings.Join(m.answer.Finding, " ")
	steps := 0
	for _, in := range answer.FurtherInputs(m.question, &m.scenario) {
		if in.Key() == "calibration" {
			break
		}
		steps++
	}
	press(m, strings.Repeat("tab ", steps)+"enter c a l . j s o n enter esc")
	if m.scenario.Calibration != "cal.json" {
		t.Fatalf("the calibration is %q:\n%s", m.scenario.Calibration, m.View())
	}
	if err := m.edit("set-slope", func(s *scenario.Scenario) error {
		in, _ := scenario.Find(s, "set-slope")
		return in.Set("0.06")
	}); err != nil {
		t.Fatal(err)
	}
	if after := strings.Join(m.answer.Finding, " "); after == before || !strings.Contains(after, "imply κ") {
		t.Errorf("calibrated counts say\n%s\nas before\n%s", after, before)
	}
}
