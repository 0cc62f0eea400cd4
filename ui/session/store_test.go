package session

import (
	"errors"
	"io/fs"
	"os"
	"path/filepath"
	"reflect"
	"runtime"
	"strings"
	"sync"
	"syscall"
	"testing"
	"time"

	"dropcrest/ui/scenario"
)

// sized is the default question asked of a particle of that many nanometres.
func sized(nm float64) scenario.Scenario {
	s := scenario.Default()
	s.DryDiameter = nm * 1e-9
	return s
}

// full is a state with something in every field.
func full() State {
	return State{
		Page: "curve", Cursor: "dry-diameter", Scenario: sized(140),
		Held: []Held{{"", 'A', sized(100)}, {"", 'C', sized(55.5)}},
		History: scenario.History{
			Past:   []scenario.Entry{{Path: "dry-diameter", Says: "dry size 100 nm → 140 nm", Before: sized(100), After: sized(140)}},
			Future: []scenario.Entry{{Path: "temperature", Says: "temperature 20 °C → 25 °C", Before: sized(140), After: sized(141)}},
		},
		Saved: time.Date(2026, 3, 14, 8, 30, 0, 123456789, time.UTC),
	}
}

// open opens the folder, fails the test on a note, and closes the store at the end.
func open(t *testing.T, dir string) (st *Store, last State, found bool) {
	t.Helper()
	st, last, found, err := Open(dir)
	if err != nil {
		t.Fatalf("Open: %v", err)
	}
	t.Cleanup(func() { _ = st.Close() })
	return st, last, found
}

// save saves a state in a folder that nobody owns.
func save(t *testing.T, dir string, state State) {
	t.Helper()
	st, _, _ := open(t, dir)
	if err := st.Save(state); err != nil {
		t.Fatalf("Save: %v", err)
	}
	if err := st.Close(); err != nil {
		t.Fatalf("Close: %v", err)
	}
}

func TestRoundTrip(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "state", "dropcrest")
	st, _, found := open(t, dir)
	if found || !st.Owned() {
		t.Fatalf("a new folder: found %t, owned %t", found, st.Owned())
	}
	if err := st.Save(full()); err != nil {
		t.Fatal(err)
	}
	if err := st.Close(); err != nil {
		t.Fatal(err)
	}
	_, got, found := open(t, dir)
	if !found {
		t.Fatal("the session is not found again")
	}
	if want := full(); !reflect.DeepEqual(got, want) {
		t.Errorf("read   %+v\nwritten %+v", got, want)
	}
}

func TestFilesArePrivate(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("no such modes on Windows")
	}
	dir := filepath.Join(t.TempDir(), "state", "dropcrest")
	save(t, dir, full())
	for name, want := range map[string]fs.FileMode{".": 0o700, "..": 0o700, scenarioFile: 0o600, sessionFile: 0o600, lockFile: 0o600} {
		info, err := os.Stat(filepath.Join(dir, name))
		if err != nil {
			t.Fatal(err)
		}
		if got := info.Mode().Perm(); got != want {
			t.Errorf("%s has mode %o, want %o", name, got, want)
		}
	}
}

func TestSavedTimeIsNow(t *testing.T) {
	dir := t.TempDir()
	before := time.Now()
	save(t, dir, State{Scenario: sized(80)})
	_, got, _ := open(t, dir)
	if got.Saved.Before(before) || got.Saved.After(time.Now()) {
		t.Errorf("saved at %v", got.Saved)
	}
}

func TestSecondInstance(t *testing.T) {
	dir := t.TempDir()
	first, _, _ := open(t, dir)
	if err := first.Save(full()); err != nil {
		t.Fatal(err)
	}
	second, last, found := open(t, dir)
	if second.Owned() || !first.Owned() {
		t.Fatalf("owned by the first %t, by the second %t", first.Owned(), second.Owned())
	}
	if !found || last.Cursor != "dry-diameter" {
		t.Errorf("the second instance cannot read the session: %+v", last)
	}
	if err := second.Save(State{Scenario: sized(7)}); err != nil {
		t.Errorf("Save without owning: %v", err)
	}
	if err := second.Decline(); err != nil {
		t.Errorf("Decline without owning: %v", err)
	}
	if err := first.Close(); err != nil {
		t.Fatal(err)
	}
	third, last, _ := open(t, dir)
	if !third.Owned() || last.Scenario.DryDiameter != sized(140).DryDiameter {
		t.Errorf("after the first has gone: owned %t, %v m", third.Owned(), last.Scenario.DryDiameter)
	}
}

func TestClosedAndNilStores(t *testing.T) {
	dir := t.TempDir()
	closed, _, _ := open(t, dir)
	if err := closed.Close(); err != nil {
		t.Fatal(err)
	}
	for name, st := range map[string]*Store{"closed": closed, "nil": nil} {
		if st.Owned() {
			t.Errorf("%s: owned", name)
		}
		for what, err := range map[string]error{"Save": st.Save(full()), "Decline": st.Decline(), "Close": st.Close()} {
			if err != nil {
				t.Errorf("%s: %s: %v", name, what, err)
			}
		}
	}
	if _, _, found := open(t, dir); found {
		t.Error("a closed store has saved something")
	}
}

func TestDecline(t *testing.T) {
	dir := t.TempDir()
	save(t, dir, full())
	st, _, found := open(t, dir)
	if !found {
		t.Fatal("no session")
	}
	if err := st.Decline(); err != nil {
		t.Fatal(err)
	}
	if err := st.Save(State{Page: "curve", Scenario: sized(33)}); err != nil {
		t.Fatal(err)
	}
	f, err := os.Open(filepath.Join(dir, scenarioBefore))
	if err != nil {
		t.Fatal(err)
	}
	defer f.Close()
	before, err := scenario.Decode(scenarioBefore, f)
	if err != nil || before.DryDiameter != sized(140).DryDiameter {
		t.Errorf("the session before has %v m, error %v", before.DryDiameter, err)
	}
	around, err := os.ReadFile(filepath.Join(dir, sessionBefore))
	if err != nil {
		t.Fatal(err)
	}
	if state, err := decode(around); err != nil || len(state.Held) != 2 {
		t.Errorf("the session before has %d held curves, error %v", len(state.Held), err)
	}
}

// Without its partner a declined file must not meet that of an older session.
func TestDeclineKeepsAPair(t *testing.T) {
	dir := t.TempDir()
	save(t, dir, full())
	st, _, _ := open(t, dir)
	if err := st.Decline(); err != nil {
		t.Fatal(err)
	}
	if err := os.WriteFile(filepath.Join(dir, scenarioFile), []byte("dry-diameter = \"5nm\"\n"), 0o600); err != nil {
		t.Fatal(err)
	}
	if err := st.Decline(); err != nil {
		t.Fatal(err)
	}
	if _, err := os.Stat(filepath.Join(dir, sessionBefore)); !errors.Is(err, fs.ErrNotExist) {
		t.Errorf("the older session-before stands beside a newer scenario-before: %v", err)
	}
}

// Savers may overtake each other; the newest state wins.
func TestConcurrentSaves(t *testing.T) {
	dir := t.TempDir()
	st, _, _ := open(t, dir)
	start := time.Now()
	const savers = 12
	var wg sync.WaitGroup
	for i := range savers {
		wg.Go(func() {
			n := (i*5)%savers + 1
			err := st.Save(State{Scenario: sized(float64(n)), Saved: start.Add(time.Duration(n) * time.Millisecond)})
			if err != nil {
				t.Error(err)
			}
		})
	}
	wg.Wait()
	_ = st.Close()
	_, got, _ := open(t, dir)
	if want := sized(savers).DryDiameter; got.Scenario.DryDiameter != want {
		t.Errorf("the last state has %v m, want %v", got.Scenario.DryDiameter, want)
	}
}

func TestFullDisk(t *testing.T) {
	if _, err := os.Stat("/dev/full"); err != nil {
		t.Skip("no /dev/full here")
	}
	dir := t.TempDir()
	st, _, _ := open(t, dir)
	if err := st.Save(full()); err != nil {
		t.Fatal(err)
	}
	for _, name := range []string{scenarioFile, sessionFile} {
		// The temporary file leads to a device that is always full.
		if err := os.Symlink("/dev/full", filepath.Join(dir, name+".tmp")); err != nil {
			t.Fatal(err)
		}
		err := st.Save(State{Page: "other", Scenario: sized(9)})
		if !errors.Is(err, syscall.ENOSPC) || !strings.Contains(err.Error(), "cannot be saved") {
			t.Errorf("%s: the error is %v", name, err)
		}
	}
	_ = st.Close()
	_, got, found := open(t, dir)
	if !found || got.Page != "curve" {
		t.Errorf("after a full disk: found %t, page %q", found, got.Page)
	}
	if got.Scenario.DryDiameter != sized(9).DryDiameter || len(got.History.Past) != 2 {
		t.Errorf("the question that could be saved: %v m, %d entries", got.Scenario.DryDiameter, len(got.History.Past))
	}
}

func TestUnusableFolder(t *testing.T) {
	file := filepath.Join(t.TempDir(), "file")
	if err := os.WriteFile(file, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	readOnly := filepath.Join(t.TempDir(), "readonly")
	if err := os.Mkdir(readOnly, 0o500); err != nil {
		t.Fatal(err)
	}
	for name, dir := range map[string]string{
		"its parent is a file": filepath.Join(file, "dropcrest"),
		"read-only":            filepath.Join(readOnly, "dropcrest"),
	} {
		t.Run(name, func(t *testing.T) {
			if name == "read-only" && os.Geteuid() == 0 {
				t.Skip("root writes everywhere")
			}
			st, _, found, err := Open(dir)
			if st == nil || st.Owned() || found {
				t.Fatalf("store %v, found %t", st, found)
			}
			if err == nil || !strings.Contains(err.Error(), "cannot be kept") || !strings.Contains(err.Error(), "dropcrest") {
				t.Errorf("the note is %v", err)
			}
			if err := st.Save(full()); err != nil {
				t.Errorf("Save: %v", err)
			}
		})
	}
}
