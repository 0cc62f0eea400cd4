package screen

import (
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// The Spectrum page as a person sees it, from the demo on.
func TestSpectrumScreens(t *testing.T) {
	modes := func(s *scenario.Scenario) { s.Population, s.Fit = "modes", "power" }
	look(t, "tab ", map[string]sight{
		"start_80x24":       {"plain", 80, 24, "", nil},
		"start_80x24_ascii": {"ascii", 80, 24, "", nil},
		"start_160x48":      {"plain", 160, 48, "", nil},
		"start_60x18":       {"plain", 60, 18, "", nil},
		"held_80x24":        {"plain", 80, 24, "space n n space n o", nil},
		"sizes_80x24":       {"plain", 80, 24, "v", nil},
		"sizes_160x48":      {"plain", 160, 48, "v", nil},
		"all_80x24":         {"plain", 80, 24, "right right enter up enter", nil},
		"ratio_160x48":      {"plain", 160, 48, "right right enter up enter v v", nil},
		"modes_80x24":       {"plain", 80, 24, "", modes},
		"mode_rows_160x48":  {"plain", 160, 48, "right enter tab", modes},
		"why_80x24":         {"plain", 80, 24, "end i", nil},
	})
}

// With keys alone a person comes from three files to the closure and to kappa: the
// files of the demo under names of their own say what the demo says.
func TestFromFilesToClosure(t *testing.T) {
	dir := t.TempDir()
	for _, name := range []string{"station.csv", "sizes.nas", "ccn-counts_demo-station_20260314_R0.ict"} {
		text, err := os.ReadFile("../../testdata/demo/" + name)
		if err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(filepath.Join(dir, name), text, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	o := onTerminal("plain")
	o.Env.Open = func(name string) (io.ReadCloser, error) { return os.Open(name) }
	demo := opened(o, 80, 24)
	press(demo, "tab")
	t.Chdir(dir)
	m := opened(o, 80, 24)
	press(m, "tab right enter")
	for _, begin := range []string{"c", "s i", "s t"} {
		press(m, "a "+begin+" tab enter")
	}
	press(m, "shift+tab shift+tab shift+tab")
	m.Update(answerOf(t, press(m, "d")))
	press(m, "esc")
	if m.work.old || len(m.scenario.Data) != 3 || m.answer.Records != demo.answer.Records {
		t.Fatalf("%v give %d records:\n%s", m.scenario.Data, m.answer.Records, m.View())
	}
	if !slices.Equal(m.answer.Finding, demo.answer.Finding) {
		t.Errorf("the files say\n%s\nthe demo\n%s", m.answer.Finding, demo.answer.Finding)
	}
	view := m.View()
	press(m, "end i pgdown")
	view += m.View()
	for _, want := range []string{"Predicted over measured is", "κ"} {
		if !strings.Contains(view, want) {
			t.Errorf("%q is not on the screen:\n%s", want, view)
		}
	}
	press(m, "esc")
	_, cmd := m.Update(keyOf("n"))
	if !strings.Contains(m.View(), "record 2 of 96") || !strings.Contains(m.View(), "(of the question before)") {
		t.Errorf("the next record is not on its way:\n%s", m.View())
	}
	m.Update(answerOf(t, cmd))
	if m.answer.Record != 2 || m.work.old {
		t.Errorf("record %d", m.answer.Record)
	}
}
