package session

import (
	"crypto/sha256"
	"encoding/hex"
	"os"
	"path/filepath"
)

// Shelf keeps what takes long to be made, such as the cells of a sweep, under a key;
// a file each, in a folder beside the session. The zero Shelf keeps nothing. Any
// number of programs may use one: a file is written whole or not at all, and the
// last one stays.
type Shelf struct{ dir string }

// NewShelf is the shelf beside the session in that folder. The folder need not exist.
func NewShelf(dir string) Shelf { return Shelf{filepath.Join(dir, "work")} }

func (s Shelf) file(key string) string {
	sum := sha256.Sum256([]byte(key))
	return filepath.Join(s.dir, hex.EncodeToString(sum[:16])+".json")
}

// largestKept is more than any sweep.
const largestKept = 64 << 20

// Load returns what was kept under a key, nil where there is nothing.
func (s Shelf) Load(key string) []byte {
	if s.dir == "" {
		return nil
	}
	info, err := os.Stat(s.file(key))
	if err != nil || info.Size() > largestKept {
		return nil
	}
	data, err := os.ReadFile(s.file(key))
	if err != nil {
		return nil
	}
	return data
}

// Save keeps data under a key.
func (s Shelf) Save(key string, data []byte) error {
	if s.dir == "" {
		return nil
	}
	if err := os.MkdirAll(s.dir, 0o700); err != nil {
		return &note{"the work done so far cannot be kept", err}
	}
	if err := replace(s.file(key), data); err != nil {
		return &note{"the work done so far cannot be kept", err}
	}
	return nil
}
