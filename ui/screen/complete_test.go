package screen

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/scenario"
)

// folder is a folder of files to be named.
func folder(t *testing.T, names ...string) string {
	t.Helper()
	dir := t.TempDir()
	for _, n := range names {
		name := filepath.Join(dir, n)
		if err := os.MkdirAll(filepath.Dir(name), 0o755); err != nil {
			t.Fatal(err)
		}
		if err := os.WriteFile(name, nil, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	return dir
}

func TestComplete(t *testing.T) {
	dir := folder(t, "sizes_a.csv", "sizes_b.csv", "counts.ict", "raw/one.nas", ".hidden", "evil\x1b[2J.csv", "démo.csv", "dömo.csv")
	t.Chdir(dir)
	t.Setenv("HOME", dir)
	for name, c := range map[string]struct{ typed, want, found string }{
		"one":           {"co", "counts.ict", ""},
		"several":       {"si", "sizes_", "sizes_a.csv sizes_b.csv"},
		"a folder":      {"r", "raw/", ""},
		"in a folder":   {"raw/", "raw/one.nas", ""},
		"home":          {"~", "~/", ""},
		"in home":       {"~/co", "~/counts.ict", ""},
		"hidden":        {".h", ".hidden", ""},
		"the demo":      {"dem", "demo", ""},
		"characters":    {"d", "d", "demo dömo.csv démo.csv"},
		"whole path":    {dir + "/counts", dir + "/counts.ict", ""},
		"no such":       {"x", "x", ""},
		"no terminal":   {"ev", "ev", ""},
		"no such place": {"nowhere/", "nowhere/", ""},
	} {
		t.Run(name, func(t *testing.T) {
			e := &entry{kind: scenario.File, field: newField(c.typed)}
			e.complete()
			if got := e.field.String(); got != c.want {
				t.Errorf("%q becomes %q, want %q", c.typed, got, c.want)
			}
			found := strings.Fields(c.found)
			if len(found) != len(e.found) {
				t.Errorf("found %q, want %q", e.found, found)
			}
			if fails := strings.HasPrefix(name, "no "); fails != (e.wrong != nil) {
				t.Errorf("the error is %v", e.wrong)
			}
		})
	}
}

// A name is taken only if there is such a file; ~ and detours are gone then.
func TestFileName(t *testing.T) {
	dir := folder(t, "a.csv", "raw/b.csv")
	t.Chdir(dir)
	t.Setenv("HOME", dir)
	for typed, want := range map[string]string{
		"a.csv": "a.csv", "./raw/../a.csv": "a.csv", "~/raw/b.csv": filepath.Join(dir, "raw/b.csv"), "demo": "demo", "": "", "none": "none",
		"raw": "error: raw is a folder", "c.csv": "error: there is no such file", "~/nothing": "error: there is no such file",
	} {
		got, err := fileName(typed)
		if says, refused := strings.CutPrefix(want, "error: "); refused {
			if err == nil || !strings.HasPrefix(err.Error(), says) {
				t.Errorf("%q: %v, want %s", typed, err, says)
			}
		} else if err != nil || got != want {
			t.Errorf("%q is %q (%v), want %q", typed, got, err, want)
		}
	}
}

// Files of data are added, completed, moved in time and dropped by keys.
func TestRowsOfFiles(t *testing.T) {
	m := onSeason(t)
	press(m, "right enter")
	golden.RequireEqual(t, []byte(m.View()+"\n"))
	t.Chdir(folder(t, "sizes.nas", "station.csv"))
	press(m, "a")
	if len(m.scenario.Data) != 1 {
		t.Fatal("a row is there before its name is typed")
	}
	press(m, "s i tab")
	if view := m.View(); !strings.Contains(view, "  2  <sizes.nas|>") || !strings.Contains(view, "[the invented") && !strings.Contains(view, "[demo]") {
		t.Errorf("the new row is not there:\n%s", view)
	}
	press(m, "enter right 9 0 enter")
	if len(m.scenario.Data) != 2 || m.scenario.Data[1] != (scenario.DataFile{Name: "sizes.nas", Offset: 90}) {
		t.Fatalf("the files are %v", m.scenario.Data)
	}
	press(m, "left enter")
	if e := m.panel.(*rows).entry; e == nil || e.field.String() != "sizes.nas" {
		t.Fatal("the name is not offered to be edited")
	}
	press(m, "esc a x esc shift+tab d")
	if len(m.scenario.Data) != 1 || m.scenario.Data[0].Name != "sizes.nas" {
		t.Errorf("the files are %v", m.scenario.Data)
	}
	press(m, "d esc")
	if m.panel != nil || len(m.scenario.Data) != 1 {
		t.Errorf("the files are %v, the panel is %T", m.scenario.Data, m.panel)
	}
}

// Lines of the mapping are typed; modes are rows of numbers.
func TestRowsOfColumnsAndModes(t *testing.T) {
	m := onSeason(t)
	press(m, "right right right enter a")
	m.Update(keyOf("paste:N_tot=number @size"))
	press(m, "enter")
	if len(m.scenario.Map) != 1 || m.scenario.Map[0].Text != "N_tot=number @size" {
		t.Fatalf("the mapping is %v", m.scenario.Map)
	}
	if !strings.Contains(m.View(), "   1  <N_tot=number @size>") {
		t.Errorf("the row is not there:\n%s", m.View())
	}
	press(m, "d esc home down right enter tab 5 0 0 enter right 8 0 enter a")
	if len(m.scenario.Modes) != 3 || m.scenario.Modes[1].Number != 500e6 || m.scenario.Modes[1].Median != 80e-9 {
		t.Fatalf("the modes are %v", m.scenario.Modes)
	}
	golden.RequireEqual(t, []byte(m.View()+"\n"))
}

// A series of numbers is edited as it stands, or typed anew.
func TestEntryOfNumbers(t *testing.T) {
	m := onSeason(t)
	for m.cursor != "supersaturation" {
		press(m, "right")
	}
	press(m, "enter backspace backspace , 2 % enter")
	if got := m.scenario.Supersaturations; len(got) != 6 || got[5] != 0.02 || got[0] != 0.001 {
		t.Errorf("edited to %v", got)
	}
	press(m, "enter enter")
	if len(m.history.Past) != 1 {
		t.Errorf("a text left as it was is %d changes", len(m.history.Past))
	}
	press(m, "0 . 3 , 0 . 5 enter")
	if got := m.scenario.Supersaturations; len(got) != 2 || got[0] != 0.003 {
		t.Errorf("typed %v", got)
	}
	press(m, "enter x enter")
	if m.panel == nil || len(m.scenario.Supersaturations) != 2 {
		t.Errorf("nonsense leads to %v", m.scenario.Supersaturations)
	}
	press(m, "esc up")
	if !strings.Contains(m.message, "no steps") {
		t.Errorf("a step says %q", m.message)
	}
}

// The end of a long file name is seen.
func TestLongFileName(t *testing.T) {
	m := onSeason(t)
	if err := m.edit("data", func(s *scenario.Scenario) error {
		s.Data[0].Name = "/a/very/long/way/to/a/folder/somewhere/else/sizes.nas"
		return nil
	}); err != nil {
		t.Fatal(err)
	}
	press(m, "right enter")
	if view := m.View(); !strings.Contains(view, "<...") || !strings.Contains(view, "/sizes.nas>, clock offset [") {
		t.Errorf("the row:\n%s", view)
	}
}
