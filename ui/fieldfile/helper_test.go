package fieldfile

import (
	"errors"
	"io"
	"math"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// open opens a text that has to be readable.
func open(t *testing.T, text string, use ...string) *File {
	t.Helper()
	f, err := Open("f", strings.NewReader(text), Options{})
	if err != nil {
		t.Fatal(err)
	}
	if err := f.Use(use...); err != nil {
		t.Fatal(err)
	}
	return f
}

// all reads every record, copied.
func all(t *testing.T, f *File) []Record {
	t.Helper()
	out, err := readAll(f)
	if err != io.EOF {
		t.Fatal(err)
	}
	return out
}

func readAll(f *File) ([]Record, error) {
	var out []Record
	for {
		var rec Record
		if err := f.Read(&rec); err != nil {
			return out, err
		}
		rec.Text = append([]string(nil), rec.Text...)
		for i := range rec.Flags {
			rec.Flags[i] = append([]int(nil), rec.Flags[i]...)
		}
		out = append(out, rec)
	}
}

// failure opens and reads to the end and gives the error.
func failure(text string, opt Options, use ...string) error {
	f, err := Open("f", strings.NewReader(text), opt)
	if err != nil {
		return err
	}
	if err := f.Use(use...); err != nil {
		return err
	}
	if _, err = readAll(f); err == io.EOF {
		return nil
	}
	return err
}

// says checks that an error is an *Error at that place with that text in it.
func says(t *testing.T, err error, line, column int, text string) {
	t.Helper()
	var e *Error
	if !errors.As(err, &e) {
		t.Fatalf("got %v, want an *Error with %q", err, text)
	}
	if e.Line != line || e.Column != column || !strings.Contains(err.Error(), text) {
		t.Errorf("got %q at line %d column %d,\nwant %q at line %d column %d", err, e.Line, e.Column, text, line, column)
	}
}

func noted(f *File, code string) bool {
	for _, n := range f.Notes() {
		if n.Code == code {
			return true
		}
	}
	return false
}

func sameCell(a, b Cell) bool {
	return a.State == b.State && (a.X == b.X || math.IsNaN(a.X) && math.IsNaN(b.X) || a.State == Missing)
}

func readDemo(t testing.TB, name string) string {
	t.Helper()
	data, err := os.ReadFile(filepath.Join(demoDir, name))
	if err != nil {
		t.Fatal(err)
	}
	return string(data)
}
