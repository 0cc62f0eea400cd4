package whole

import (
	"errors"
	"os"
	"path/filepath"
	"runtime"
	"strings"
	"testing"
)

func TestWrite(t *testing.T) {
	dir := t.TempDir()
	name := filepath.Join(dir, "a.csv")
	for _, text := range []string{"first", "second, longer", ""} {
		if err := Write(name, []byte(text)); err != nil {
			t.Fatal(err)
		}
		if got, err := os.ReadFile(name); err != nil || string(got) != text {
			t.Errorf("file holds %q (%v), want %q", got, err, text)
		}
	}
	only(t, dir, "a.csv")
}

func TestWriteKeepsModeAndLink(t *testing.T) {
	if runtime.GOOS == "windows" {
		t.Skip("no modes and links there")
	}
	dir := t.TempDir()
	target, link := filepath.Join(dir, "target"), filepath.Join(dir, "link")
	if err := os.WriteFile(target, []byte("old"), 0o640); err != nil {
		t.Fatal(err)
	}
	if err := os.Symlink("target", link); err != nil {
		t.Fatal(err)
	}
	if err := Write(link, []byte("new")); err != nil {
		t.Fatal(err)
	}
	if to, err := os.Readlink(link); err != nil || to != "target" {
		t.Errorf("the link points to %q (%v)", to, err)
	}
	info, err := os.Stat(target)
	if err != nil || info.Mode().Perm()&^0o640 != 0 {
		t.Errorf("mode %v (%v), want at most 0640", info.Mode(), err)
	}
}

// A file that is written in pieces is seen when it is whole, and never when it is
// dropped or a write has failed.
func TestFile(t *testing.T) {
	dir := t.TempDir()
	name := filepath.Join(dir, "a.csv")
	if err := Write(name, []byte("old")); err != nil {
		t.Fatal(err)
	}
	for _, c := range []struct {
		name string
		end  func(*File) error
		want string
	}{
		{"dropped", func(w *File) error { w.Drop(); return nil }, "old"},
		{"failed", func(w *File) error {
			_ = w.f.Close()
			_, _ = w.Write([]byte("more"))
			if err := w.Commit(); err == nil {
				return errors.New("committed after a write that failed")
			}
			return nil
		}, "old"},
		{"committed", (*File).Commit, "new, and more"},
	} {
		w, err := Create(name)
		if err != nil {
			t.Fatal(err)
		}
		for _, part := range []string{"new", ", and more"} {
			if _, err := w.Write([]byte(part)); err != nil {
				t.Fatal(err)
			}
			if text, err := os.ReadFile(name); err != nil || string(text) != "old" {
				t.Errorf("%s: the file holds %q (%v) while it is written", c.name, text, err)
			}
		}
		if err := c.end(w); err != nil {
			t.Errorf("%s: %v", c.name, err)
		}
		if text, err := os.ReadFile(name); err != nil || string(text) != c.want {
			t.Errorf("%s: the file holds %q (%v), want %q", c.name, text, err, c.want)
		}
		only(t, dir, "a.csv")
	}
}

// Nothing half-written, nothing left beside, the old file as it was.
func TestReadOnlyFolder(t *testing.T) {
	if os.Geteuid() == 0 || runtime.GOOS == "windows" {
		t.Skip("this user may write everywhere")
	}
	dir := t.TempDir()
	if err := os.Chmod(dir, 0o500); err != nil {
		t.Fatal(err)
	}
	if err := Write(filepath.Join(dir, "a"), []byte("x")); err == nil {
		t.Error("written into a read-only folder")
	}
	only(t, dir)
}

func TestNameIsTaken(t *testing.T) {
	dir := t.TempDir()
	if err := os.Mkdir(filepath.Join(dir, "folder"), 0o700); err != nil {
		t.Fatal(err)
	}
	err := Write(filepath.Join(dir, "folder"), nil)
	if err == nil || !strings.Contains(err.Error(), "folder") {
		t.Errorf("error %v, want one that says folder", err)
	}
	only(t, dir, "folder")
}

func only(t *testing.T, dir string, want ...string) {
	t.Helper()
	entries, err := os.ReadDir(dir)
	if err != nil {
		t.Fatal(err)
	}
	var names []string
	for _, e := range entries {
		names = append(names, e.Name())
	}
	if strings.Join(names, " ") != strings.Join(want, " ") {
		t.Errorf("the folder holds %q, want %q", names, want)
	}
}
