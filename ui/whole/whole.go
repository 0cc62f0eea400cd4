// Package whole writes a file whole or not at all.
package whole

import (
	"errors"
	"os"
	"path/filepath"
	"strconv"
	"time"
)

// Write writes a file whole or not at all: into a new file beside it, which
// takes its place once it is on the disk. What is no file, such as /dev/null or
// a pipe, is written as it is.
func Write(name string, data []byte) error {
	if target, err := filepath.EvalSymlinks(name); err == nil {
		name = target // a link keeps pointing where it points
	}
	mode := os.FileMode(0o666)
	switch info, err := os.Stat(name); {
	case err == nil && info.IsDir():
		return errors.New("this is a folder: give the name of a file in it")
	case err == nil && !info.Mode().IsRegular():
		return writeThrough(name, data)
	case err == nil:
		mode = info.Mode().Perm()
	}
	beside := filepath.Join(filepath.Dir(name), "."+filepath.Base(name)+"."+
		strconv.Itoa(os.Getpid())+"-"+strconv.FormatInt(time.Now().UnixNano(), 36)+".tmp")
	f, err := os.OpenFile(beside, os.O_WRONLY|os.O_CREATE|os.O_EXCL, mode)
	if err != nil {
		return err
	}
	_, err = f.Write(data)
	if err == nil {
		err = f.Sync() // a full disk may show only here
	}
	if e := f.Close(); err == nil {
		err = e
	}
	if err == nil {
		err = os.Rename(beside, name)
	}
	if err != nil {
		_ = os.Remove(beside)
	}
	return err
}

func writeThrough(name string, data []byte) error {
	f, err := os.OpenFile(name, os.O_WRONLY, 0)
	if err != nil {
		return err
	}
	_, err = f.Write(data)
	if e := f.Close(); err == nil {
		err = e
	}
	return err
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
