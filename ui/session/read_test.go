package session

import (
	"encoding/json"
	"os"
	"path/filepath"
	"reflect"
	"strings"
	"testing"
	"unicode"

	"dropcrest/ui/scenario"
)

// write puts a file into the folder.
func write(t *testing.T, dir, name, content string) {
	t.Helper()
	if err := os.WriteFile(filepath.Join(dir, name), []byte(content), 0o600); err != nil {
		t.Fatal(err)
	}
}

// toml is a question as the text of a scenario file.
func toml(t *testing.T, s scenario.Scenario) string {
	t.Helper()
	var b strings.Builder
	if err := scenario.Encode(&b, s); err != nil {
		t.Fatal(err)
	}
	return b.String()
}

// A kill between the two renames leaves a newer scenario.toml beside an older
// session.json.
func TestKilledBetweenTheFiles(t *testing.T) {
	dir := t.TempDir()
	save(t, dir, full())
	write(t, dir, scenarioFile, toml(t, sized(200)))
	_, got, found := open(t, dir)
	if !found || got.Scenario.DryDiameter != sized(200).DryDiameter {
		t.Fatalf("found %t, %v m: the newer file does not decide", found, got.Scenario.DryDiameter)
	}
	if len(got.Held) != 2 || got.Cursor != "dry-diameter" {
		t.Errorf("what lay around is lost: %+v", got)
	}
	past := got.History.Past
	if len(past) != 2 || len(got.History.Future) != 0 {
		t.Fatalf("%d entries to undo, %d to redo", len(past), len(got.History.Future))
	}
	last := past[len(past)-1]
	if last.Before.DryDiameter != sized(140).DryDiameter || last.After.DryDiameter != sized(200).DryDiameter || last.Says == "" {
		t.Errorf("the step cannot be undone: %+v", last)
	}
}

// A temporary file of a killed program is neither read nor in the way.
func TestLeftTemporaryFiles(t *testing.T) {
	dir := t.TempDir()
	save(t, dir, full())
	write(t, dir, scenarioFile+".tmp", "dry-dia")
	write(t, dir, sessionFile+".tmp", "{")
	st, got, found := open(t, dir)
	if !found || got.Page != "curve" {
		t.Errorf("found %t, page %q", found, got.Page)
	}
	if err := st.Save(full()); err != nil {
		t.Error(err)
	}
}

func TestOneFileIsEnough(t *testing.T) {
	for gone, want := range map[string]struct {
		page string
		held int
	}{scenarioFile: {"curve", 2}, sessionFile: {"", 0}} {
		dir := t.TempDir()
		save(t, dir, full())
		if err := os.Remove(filepath.Join(dir, gone)); err != nil {
			t.Fatal(err)
		}
		_, got, found := open(t, dir)
		if !found || got.Scenario.DryDiameter != sized(140).DryDiameter {
			t.Errorf("without %s: found %t, %v m", gone, found, got.Scenario.DryDiameter)
		}
		if got.Page != want.page || len(got.Held) != want.held {
			t.Errorf("without %s: page %q, %d held", gone, got.Page, len(got.Held))
		}
	}
}

func TestDamaged(t *testing.T) {
	good := toml(t, sized(10))
	for name, c := range map[string]struct{ file, content, says string }{
		"empty":                     {sessionFile, "", "JSON"},
		"not JSON":                  {sessionFile, "page = 1", "invalid"},
		"cut short":                 {sessionFile, `{"version": 1, "pag`, "JSON"},
		"a newer program's":         {sessionFile, `{"version": 2, "page": {"new": "form"}}`, "version 2"},
		"no version":                {sessionFile, `{"page": "curve"}`, "version 0"},
		"another type":              {sessionFile, `{"version": 1, "page": 3}`, "page"},
		"a scenario that is not":    {sessionFile, `{"version": 1, "scenario": 3, "scenarios": []}`, "scenario 3"},
		"a negative place":          {sessionFile, `{"version": 1, "scenario": -1, "scenarios": []}`, "scenario -1"},
		"an impossible size":        {sessionFile, `{"version": 1, "scenarios": ["dry-diameter = \"-5nm\""]}`, "scenario 0"},
		"a held curve without name": {sessionFile, `{"version": 1, "held": [{"letter": "\u001b"}], "scenarios": [` + quoted(t, good) + `]}`, "A to Z"},
		"a question that is none":   {scenarioFile, "dry-diameter = ", scenarioFile},
		"binary":                    {scenarioFile, "\x00\x1b]0;x\x07\xff", scenarioFile},
	} {
		t.Run(name, func(t *testing.T) {
			dir := t.TempDir()
			save(t, dir, full())
			write(t, dir, c.file, c.content)
			st, got, found, err := Open(dir)
			t.Cleanup(func() { _ = st.Close() })
			if err == nil {
				t.Fatal("no note")
			}
			if !strings.Contains(err.Error(), c.says) || !strings.Contains(err.Error(), c.file+".damaged") {
				t.Errorf("the note is %v", err)
			}
			safe(t, strings.Split(err.Error(), "\n")...)
			if kept, err := os.ReadFile(filepath.Join(dir, c.file+".damaged")); string(kept) != c.content {
				t.Errorf("kept %q, error %v", kept, err)
			}
			if !found || got.Scenario.DryDiameter != sized(140).DryDiameter || !st.Owned() {
				t.Errorf("the other file does not go on: found %t, %v m, owned %t", found, got.Scenario.DryDiameter, st.Owned())
			}
		})
	}
}

func quoted(t *testing.T, s string) string {
	t.Helper()
	b, err := json.Marshal(s)
	if err != nil {
		t.Fatal(err)
	}
	return string(b)
}

func TestEveryDamagedFileIsKept(t *testing.T) {
	dir := t.TempDir()
	for _, content := range []string{"first", "second", "third"} {
		write(t, dir, sessionFile, content)
		st, _, found, err := Open(dir)
		if found || err == nil {
			t.Errorf("%s: found %t, note %v", content, found, err)
		}
		_ = st.Close()
	}
	for kept, want := range map[string]string{".damaged": "first", ".damaged-2": "second", ".damaged-3": "third"} {
		if got, err := os.ReadFile(filepath.Join(dir, sessionFile+kept)); string(got) != want {
			t.Errorf("%s holds %q, error %v, want %q", kept, got, err, want)
		}
	}
}

// A second instance reads; it renames nothing.
func TestOnlyTheOwnerPutsAside(t *testing.T) {
	dir := t.TempDir()
	owner, _, _ := open(t, dir)
	write(t, dir, sessionFile, "damaged")
	second, _, found, err := Open(dir)
	t.Cleanup(func() { _ = second.Close() })
	if found || err == nil || strings.Contains(err.Error(), ".damaged") {
		t.Errorf("found %t, note %v", found, err)
	}
	if _, err := os.Stat(filepath.Join(dir, sessionFile)); err != nil {
		t.Errorf("the file was moved: %v", err)
	}
	if err := owner.Save(full()); err != nil {
		t.Error(err)
	}
}

func TestNotAFile(t *testing.T) {
	for name, place := range map[string]func(path string) error{
		"a folder": func(path string) error { return os.Mkdir(path, 0o700) },
		"huge":     func(path string) error { return os.Truncate(touch(path), largest+1) },
	} {
		t.Run(name, func(t *testing.T) {
			dir := t.TempDir()
			if err := place(filepath.Join(dir, sessionFile)); err != nil {
				t.Fatal(err)
			}
			st, _, found, err := Open(dir)
			t.Cleanup(func() { _ = st.Close() })
			if found || err == nil {
				t.Errorf("found %t, note %v", found, err)
			}
			if err := st.Save(full()); err != nil {
				t.Errorf("it is in the way: %v", err)
			}
		})
	}
}

func touch(path string) string {
	_ = os.WriteFile(path, nil, 0o600)
	return path
}

func TestNoTextDrivesTheTerminal(t *testing.T) {
	dir := t.TempDir()
	state := full()
	state.Page = "cur\x1b]0;title\x07ve"
	state.Cursor = "dry\x1b[2J"
	state.History.Past[0].Says = "line\nbreak \x1b[31mred \u202eback"
	state.History.Past[0].Path = "a\x9bb"
	save(t, dir, state)
	_, got, found := open(t, dir)
	if !found {
		t.Fatal("not found")
	}
	safe(t, texts(got)...)
}

// texts are all free texts of a state.
func texts(s State) []string {
	all := []string{s.Page, string(s.Cursor)}
	ofScenario := func(s scenario.Scenario) {
		for _, c := range s.Components {
			all = append(all, c.Substance)
		}
	}
	ofScenario(s.Scenario)
	for _, h := range s.Held {
		all = append(all, string(h.Letter))
		ofScenario(h.Scenario)
	}
	for _, list := range [][]scenario.Entry{s.History.Past, s.History.Future} {
		for _, e := range list {
			all = append(all, e.Says, string(e.Path))
			ofScenario(e.Before)
			ofScenario(e.After)
		}
	}
	return all
}

// The saved undo list is bounded; what is nearest to the present is kept.
func TestHistoryIsBounded(t *testing.T) {
	dir := t.TempDir()
	state := State{Scenario: sized(1000)}
	for nm := 1; nm <= 3*keptEntries; nm++ {
		e := scenario.Entry{Path: "dry-diameter", Says: "x", Before: sized(float64(nm)), After: sized(float64(nm + 1))}
		state.History.Past = append(state.History.Past, e)
	}
	save(t, dir, state)
	_, got, _ := open(t, dir)
	past := got.History.Past
	if len(past) != keptEntries || past[keptEntries-1].After.DryDiameter != sized(3*keptEntries+1).DryDiameter {
		t.Errorf("%d entries, the last leads to %v m", len(past), past[len(past)-1].After.DryDiameter)
	}
	info, err := os.Stat(filepath.Join(dir, sessionFile))
	if err != nil {
		t.Fatal(err)
	}
	t.Logf("session.json of %d entries: %d bytes", keptEntries, info.Size())
}

// What is read can be changed without changing its neighbours.
func TestNothingIsShared(t *testing.T) {
	dir := t.TempDir()
	state := full()
	state.Held = []Held{{"", 'A', sized(140)}}
	save(t, dir, state)
	_, got, _ := open(t, dir)
	if len(got.Scenario.Components) == 0 {
		t.Fatal("the default has no component")
	}
	got.Scenario.Components[0].Share = 77
	if got.Held[0].Scenario.Components[0].Share == 77 || got.History.Past[0].After.Components[0].Share == 77 {
		t.Error("a held curve changes with the question")
	}
}

// Whatever stands in the two files: no panic, no text that drives a terminal, and
// what was read can be written and read again.
func FuzzRead(f *testing.F) {
	question, around, err := encode(full())
	if err != nil {
		f.Fatal(err)
	}
	f.Add(question, around)
	f.Add([]byte("dry-diameter = \"5nm\""), []byte(`{"version": 1}`))
	f.Add([]byte{}, []byte(`{"version": 1, "held": [{"letter": "A", "scenario": 0}], "scenarios": [""]}`))
	f.Fuzz(func(t *testing.T, question, around []byte) {
		state, err := decode(around)
		if err != nil {
			safe(t, (&note{"x", err}).Error())
			return
		}
		if q, err := decodeQuestion(question); err == nil {
			state = reconciled(state, q)
		} else {
			safe(t, (&note{"x", err}).Error())
		}
		safe(t, texts(state)...)
		_, written, err := encode(state)
		if err != nil {
			t.Fatalf("what was read cannot be written: %v", err)
		}
		again, err := decode(written)
		if err != nil {
			t.Fatalf("what was written cannot be read: %v", err)
		}
		if !reflect.DeepEqual(again.Scenario, state.Scenario) || len(again.Held) != len(state.Held) {
			t.Errorf("read again %+v, written %+v", again, state)
		}
	})
}

// safe checks that no text could drive a terminal.
func safe(t *testing.T, texts ...string) {
	t.Helper()
	for _, text := range texts {
		if strings.ContainsFunc(text, func(r rune) bool { return unicode.IsControl(r) || unicode.Is(unicode.Cf, r) }) {
			t.Errorf("%q could drive a terminal", text)
		}
	}
}

func TestMissingFolderIsNoNote(t *testing.T) {
	_, _, found, err := Open(filepath.Join(t.TempDir(), "a", "b"))
	if found || err != nil {
		t.Errorf("found %t, note %v", found, err)
	}
}
