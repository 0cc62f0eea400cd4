package screen

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"

	"dropcrest/ui/plain"
	"dropcrest/ui/scenario"
)

// Names of files: completed by Tab, made whole when they are taken.

// mostNames is how many names of a folder are looked at: a key must not wait for
// a folder of a million files.
const mostNames = 10_000

// complete brings the name being typed as far as it is the same for all files
// that begin so, and remembers them.
func (e *entry) complete() {
	names, err := candidates(e.field.String())
	e.found, e.wrong = nil, nil
	switch {
	case err != nil:
		e.wrong = err
	case len(names) == 0:
		e.wrong = errors.New("no file begins so")
	default:
		e.field = newField(common(names))
		if len(names) > 1 {
			for _, n := range names {
				e.found = append(e.found, ending(n))
			}
		}
	}
}

// ending is the last part of a name, with its slash for a folder.
func ending(name string) string {
	rest := strings.TrimSuffix(name, string(filepath.Separator))
	return name[strings.LastIndexByte(rest, filepath.Separator)+1:]
}

// candidates are the names that go on from a text, folders with a slash at their
// end. Those that begin with a point only count when the point is typed, and those
// that could drive the terminal not at all. The word of the demo is one of them.
func candidates(typed string) ([]string, error) {
	at := strings.LastIndexByte(typed, filepath.Separator) + 1
	folder, begin := typed[:at], typed[at:]
	if typed == "~" {
		return []string{typed + string(filepath.Separator)}, nil
	}
	where, err := full(folder)
	if err != nil {
		return nil, err
	}
	if where == "" {
		where = "."
	}
	dir, err := os.Open(where)
	if err != nil {
		return nil, unread(err)
	}
	defer dir.Close()
	entries, err := dir.ReadDir(mostNames)
	if err != nil && !errors.Is(err, io.EOF) {
		return nil, unread(err)
	}
	var names []string
	for _, f := range entries {
		name := f.Name()
		hidden := strings.HasPrefix(name, ".") && !strings.HasPrefix(begin, ".")
		if !strings.HasPrefix(name, begin) || hidden || plain.Clean(name) != name {
			continue
		}
		if isFolder(filepath.Join(where, name), f) {
			name += string(filepath.Separator)
		}
		names = append(names, folder+name)
	}
	if folder == "" && begin != "" && strings.HasPrefix(scenario.DemoData, begin) && !slices.Contains(names, scenario.DemoData) {
		names = append(names, scenario.DemoData)
	}
	slices.Sort(names)
	return names, nil
}

// isFolder looks behind links too.
func isFolder(name string, f fs.DirEntry) bool {
	if f.Type()&fs.ModeSymlink == 0 {
		return f.IsDir()
	}
	info, err := os.Stat(name)
	return err == nil && info.IsDir()
}

// common is what all names begin with, in whole characters.
func common(names []string) string {
	first := []rune(names[0])
	for _, n := range names[1:] {
		other := []rune(n)
		same := 0
		for same < len(first) && same < len(other) && first[same] == other[same] {
			same++
		}
		first = first[:same]
	}
	return string(first)
}

// fileName is the name that a typed text means: ~ is the home folder, and there
// must be a file of that name. The demo and no file need none.
func fileName(typed string) (string, error) {
	if typed == "" || typed == "none" || typed == scenario.DemoData {
		return typed, nil
	}
	name, err := full(typed)
	if err != nil {
		return "", err
	}
	name = filepath.Clean(name)
	info, err := os.Stat(name)
	switch {
	case err != nil:
		return "", unread(err)
	case info.IsDir():
		return "", fmt.Errorf("%s is a folder: Tab completes the name of a file in it", typed)
	}
	return name, nil
}

// unread is why a file or folder cannot be had.
func unread(err error) error {
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return errors.New("there is no such file: Tab completes a name")
	case errors.Is(err, fs.ErrPermission):
		return errors.New("it may not be read: its owner can allow that")
	}
	var of *fs.PathError
	if errors.As(err, &of) {
		return of.Err
	}
	return err
}
