package session

import (
	"os"
	"path/filepath"
)

// replace writes a file whole or not at all: a reader, and a program started
// after a crash, finds the old content or the new one. The temporary file has a
// fixed name, so that a crash leaves one behind at most; only the owner of the
// session writes.
func replace(name string, data []byte) error {
	temporary := name + ".tmp"
	if err := writeSynced(temporary, data); err != nil {
		_ = os.Remove(temporary)
		return err
	}
	if err := os.Rename(temporary, name); err != nil {
		_ = os.Remove(temporary)
		return err
	}
	// The rename itself lasts once the folder is synced. Some systems cannot sync
	// a folder; the file is whole there too, only later.
	if folder, err := os.Open(filepath.Dir(name)); err == nil {
		_ = folder.Sync()
		_ = folder.Close()
	}
	return nil
}

func writeSynced(name string, data []byte) error {
	f, err := os.OpenFile(name, os.O_WRONLY|os.O_CREATE|os.O_TRUNC, 0o600)
	if err != nil {
		return err
	}
	if _, err := f.Write(data); err != nil {
		_ = f.Close()
		return err
	}
	// Without this a file system may store the rename before the content, and a
	// power cut leaves an empty file.
	if err := f.Sync(); err != nil {
		_ = f.Close()
		return err
	}
	return f.Close()
}
