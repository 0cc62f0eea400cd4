package session

import (
	"os"
	"path/filepath"
	"testing"
)

func TestShelf(t *testing.T) {
	dir := t.TempDir()
	s := NewShelf(filepath.Join(dir, "state"))
	if got := s.Load("a sweep"); got != nil {
		t.Errorf("an empty shelf holds %q", got)
	}
	for _, text := range []string{"one", "two"} {
		if err := s.Save("a sweep", []byte(text)); err != nil {
			t.Fatal(err)
		}
		if got := s.Load("a sweep"); string(got) != text {
			t.Errorf("%q is kept as %q", text, got)
		}
	}
	if got := s.Load("another"); got != nil {
		t.Errorf("another key has %q", got)
	}
	if err := (Shelf{}).Save("x", nil); err != nil || (Shelf{}).Load("x") != nil {
		t.Error("no shelf keeps something")
	}
	blocked := filepath.Join(dir, "file")
	if err := os.WriteFile(blocked, nil, 0o600); err != nil {
		t.Fatal(err)
	}
	if err := NewShelf(blocked).Save("x", []byte("y")); err == nil {
		t.Error("a file in the way of the folder is no error")
	}
}
