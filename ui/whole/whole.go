// Package whole writes a file whole or not at all.
package whole

import (
	"errors"
	"os"
	"path/filepath"
	"strconv"
	"time"
)

// File is a file that is being written. Nothing is seen of it under its name
// before Commit. What is no file, such as /dev/null or a pipe, is written as it is.
type File struct {
	f      *os.File
	name   string
	beside string // what is written until Commit; "": the name itself, which is no file
	err    error  // of the first write that failed
}

// Create begins a file: in a new one beside it, which takes its place by Commit.
// Either Commit or Drop has to be called.
func Create(name string) (*File, error) {
	if target, err := filepath.EvalSymlinks(name); err == nil {
		name = target // a link keeps pointing where it points
	}
	mode := os.FileMode(0o666)
	switch info, err := os.Stat(name); {
	case err == nil && info.IsDir():
		return nil, errors.New("this is a folder: give the name of a file in it")
	case err == nil && !info.Mode().IsRegular():
		f, err := os.OpenFile(name, os.O_WRONLY, 0)
		if err != nil {
			return nil, err
		}
		return &File{f: f, name: name}, nil
	case err == nil:
		mode = info.Mode().Perm()
	}
	beside := filepath.Join(filepath.Dir(name), "."+filepath.Base(name)+"."+
		strconv.Itoa(os.Getpid())+"-"+strconv.FormatInt(time.Now().UnixNano(), 36)+".tmp")
	f, err := os.OpenFile(beside, os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
	if err != nil {
		return nil, err
	}
	return &File{f: f, name: name, beside: beside}, nil
}

func (w *File) Write(data []byte) (int, error) {
	n, err := w.f.Write(data)
	if w.err == nil {
		w.err = err
	}
	return n, err
}

// Commit makes the file take its place once it is on the disk. After an error,
// also one of an earlier Write, nothing is left of it and the old file is as it was.
func (w *File) Commit() error {
	err := w.err
	if err == nil && w.beside != "" {
		err = w.f.Sync() // a full disk may show only here
	}
	if e := w.f.Close(); err == nil {
		err = e
	}
	if w.beside == "" {
		return err
	}
	if err == nil {
		err = os.Rename(w.beside, w.name)
	}
	if err != nil {
		_ = os.Remove(w.beside)
	}
	return err
}

// Drop leaves nothing of the file.
func (w *File) Drop() {
	_ = w.f.Close()
	if w.beside != "" {
		_ = os.Remove(w.beside)
	}
}

// Write writes a file whole or not at all. What is no file is written as it is.
func Write(name string, data []byte) error {
	w, err := Create(name)
	if err != nil {
		return err
	}
	_, _ = w.Write(data) // Commit says what went wrong
	return w.Commit()
}

// Reason is why a file cannot be written, without the path again.
func Reason(err error) error {
	var p *os.PathError
	if errors.As(err, &p) {
		return p.Err
	}
	var l *os.LinkError
	if errors.As(err, &l) {
		return l.Err
	}
	return err
}
