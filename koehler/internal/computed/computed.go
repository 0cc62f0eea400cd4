// Package computed reads the values that other libraries have computed for tests:
// testdata/computed, whose README says how they came about.
package computed

import (
	"encoding/json"
	"os"
	"path/filepath"
	"testing"
)

// Read returns the cases of a file. C has fields ID, Family, Input and Output as the
// file does.
func Read[C any](t testing.TB, name string) []C {
	t.Helper()
	text, err := os.ReadFile(find(name))
	if err != nil {
		t.Fatal(err)
	}
	var file struct {
		Count int `json:"n_cases"`
		Cases []C `json:"cases"`
	}
	if err := json.Unmarshal(text, &file); err != nil {
		t.Fatalf("%s: %v", name, err)
	}
	announced := file.Count
	if announced == 0 {
		announced = max(1, len(file.Cases)) // not every file says how many
	}
	if len(file.Cases) != announced {
		t.Fatalf("%s: %d cases, want %d", name, len(file.Cases), announced)
	}
	return file.Cases
}

// find is the path of a file from the folder of the package under test.
func find(name string) string {
	folder := ".."
	for range 3 {
		path := filepath.Join(folder, "testdata", "computed", name)
		if _, err := os.Stat(path); err == nil {
			return path
		}
		folder = filepath.Join(folder, "..")
	}
	return filepath.Join("testdata", "computed", name)
}
