package screen

import (
	"bytes"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// Every ending gives a file of that kind, with what is on the screen.
func TestWrite(t *testing.T) {
	for ending, begins := range map[string]string{
		"toml": "", "csv": "wet_radius_m,", "json": "{", "txt": "A dry particle of 100 nm",
		"svg": "<?xml", "png": "\x89PNG", "pdf": "%PDF", "PNG": "\x89PNG",
	} {
		t.Run(ending, func(t *testing.T) {
			d := newDesk(t)
			d.hold()
			name := filepath.Join(t.TempDir(), "out."+ending)
			d.open(newWrite(d.model)).paste(name).press("enter").closed()
			got, err := os.ReadFile(name)
			if err != nil {
				t.Fatal(err)
			}
			if !bytes.HasPrefix(got, []byte(begins)) || len(got) == 0 {
				t.Errorf("the file begins %q, want %q", got[:min(len(got), 40)], begins)
			}
			if !strings.Contains(d.message, "written: "+name) {
				t.Errorf("message %q", d.message)
			}
		})
	}
}

func TestWrittenFilesReadBack(t *testing.T) {
	d := newDesk(t, "dry-diameter", "140", "temperature", "10")
	dir := t.TempDir()
	question, numbers := filepath.Join(dir, "a.toml"), filepath.Join(dir, "a.json")
	d.open(newWrite(d.model)).paste(question).press("enter").closed()
	d.open(newWrite(d.model)).paste(numbers).press("enter").closed()
	f, err := os.Open(question)
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	s, err := scenario.Decode(question, f)
	if err != nil || len(scenario.Changes(s, d.scenario)) > 0 {
		t.Errorf("the question comes back changed (%v): %v", err, scenario.Changes(s, d.scenario))
	}
	text, err := os.ReadFile(numbers)
	if err != nil {
		t.Fatal(err)
	}
	var facts map[string]any
	if err := json.Unmarshal(text, &facts); err != nil {
		t.Fatal(err)
	}
	if facts["version"] != "test" || facts["critical_supersaturation_percent"] == nil {
		t.Errorf("version %v, crest %v", facts["version"], facts["critical_supersaturation_percent"])
	}
}

// A file that exists is written over only by a second Enter.
func TestWriteAsksFirst(t *testing.T) {
	d := newDesk(t)
	name := filepath.Join(t.TempDir(), "a.csv")
	if err := os.WriteFile(name, []byte("precious"), 0o600); err != nil {
		t.Fatal(err)
	}
	holds := func(want bool) {
		t.Helper()
		if got, err := os.ReadFile(name); err != nil || (string(got) == "precious") != want {
			t.Errorf("the old file is there: %v (%v), want %v", !want, err, want)
		}
	}
	d.open(newWrite(d.model)).paste(name).press("enter").says("a.csv exists: Enter writes over it")
	holds(true)
	d.press("esc").says("write to:")
	holds(true)
	d.press("enter").says("exists")
	d.press("v", "backspace", "enter").says("exists") // another name asks anew
	holds(true)
	d.press("enter").closed()
	holds(false)
}

// What goes wrong is said, and the name stays.
func TestWriteRefuses(t *testing.T) {
	dir := t.TempDir()
	if err := os.Mkdir(filepath.Join(dir, "folder.csv"), 0o700); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(filepath.Join(dir, "file"), nil, 0o600); err != nil {
		t.Fatal(err)
	}
	for name, c := range map[string]struct{ file, says string }{
		"no ending":       {"answer", "says no form: want .toml"},
		"unknown ending":  {"answer.docx", `"answer.docx" says no form`},
		"no such folder":  {"none/answer.csv", "no such folder"},
		"a folder":        {"folder.csv", "this is a folder"},
		"file for folder": {"file/answer.csv", "not a directory"},
	} {
		t.Run(name, func(t *testing.T) {
			d := newDesk(t)
			d.open(newWrite(d.model)).paste(filepath.Join(dir, c.file)).press("enter")
			if name == "a folder" {
				d.press("enter")
			}
			d.says("error: ", c.says)
			if got := d.panel.(*writer).field.String(); got != filepath.Join(dir, c.file) {
				t.Errorf("the name is %q now", got)
			}
		})
	}
}

// /dev/full is a disk without room: the text must say so.
func TestWriteFullDisk(t *testing.T) {
	if _, err := os.Stat("/dev/full"); err != nil {
		t.Skip("no /dev/full here")
	}
	link := filepath.Join(t.TempDir(), "full.csv")
	if err := os.Symlink("/dev/full", link); err != nil {
		t.Skip(err)
	}
	d := newDesk(t)
	d.open(newWrite(d.model)).paste(link).press("enter", "enter").says("error: no space left")
}

// A read-only folder, for whoever may not write everywhere.
func TestWriteReadOnly(t *testing.T) {
	if os.Geteuid() == 0 {
		t.Skip("root may write everywhere")
	}
	dir := t.TempDir()
	if err := os.Chmod(dir, 0o500); err != nil {
		t.Fatal(err)
	}
	d := newDesk(t)
	d.open(newWrite(d.model)).paste(filepath.Join(dir, "a.csv")).press("enter").says("error: permission denied", "another folder")
}

// Esc keeps the name; a panel that was closed while it wrote says the end in the
// message line.
func TestWriteLeaves(t *testing.T) {
	d := newDesk(t)
	d.open(newWrite(d.model)).press("abc", "esc").closed()
	d.open(newWrite(d.model)).says("write to: abc|")

	name := filepath.Join(t.TempDir(), "none", "a.csv")
	w := &writer{field: newField(name)}
	next, cmd := w.take(d.model)
	if next != panel(w) || cmd == nil || !w.busy {
		t.Fatal("nothing is being written")
	}
	d.open(w).says("writing").press("x", "enter", "esc").closed()
	d.Update(cmd())
	if !strings.Contains(d.message, "error: "+name) {
		t.Errorf("message %q", d.message)
	}
}

// A fault in making a form is an error of this file, not the end of the program.
func TestWriteSurvivesAFault(t *testing.T) {
	d := newDesk(t)
	s := d.sheet(0)
	s.Question.Statement = func(scenario.Scenario) []string { panic("a fault") }
	name := filepath.Join(t.TempDir(), "a.txt")
	if _, err := writeSheet(name, "text", s); err == nil || !strings.Contains(err.Error(), "a fault") {
		t.Errorf("error %v", err)
	}
	if there(name) {
		t.Error("a file is there")
	}
}
