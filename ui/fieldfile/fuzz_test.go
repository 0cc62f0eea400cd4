package fieldfile

import (
	"bytes"
	"errors"
	"io"
	"strings"
	"testing"
	"unicode"
)

// readable holds for whatever bytes come: no panic, an *Error with a clean text
// or the end, as many cells as columns, a state for each, clean names, and a
// mapping that can be told again.
func readable(t *testing.T, data []byte, opt Options) {
	f, err := Open("f", bytes.NewReader(data), opt)
	if err != nil {
		knownError(t, err)
		return
	}
	for _, c := range f.Columns {
		if strings.ContainsFunc(c.Name+c.Unit+c.Long, unicode.IsControl) {
			t.Fatalf("column %+v", c)
		}
	}
	if err := f.Use(f.Mapping()...); err != nil && !ambiguous(f) {
		t.Fatalf("its own mapping %q: %v", f.Mapping(), err)
	}
	s := f.Samples()
	var one Sample
	for n := 0; ; n++ {
		err := s.Next(&one)
		if err != nil {
			if err != io.EOF {
				knownError(t, err)
			}
			break
		}
		if n > len(data) || len(one.Sizes) != len(one.Bins) || one.End.Before(one.Start) {
			t.Fatalf("sample %+v", one)
		}
	}
	for _, n := range f.Notes() {
		if strings.ContainsFunc(n.Text, unicode.IsControl) {
			t.Fatalf("note %q", n.Text)
		}
	}
}

// ambiguous names cannot be told in a line of a mapping.
func ambiguous(f *File) bool {
	for _, c := range f.Columns {
		if strings.ContainsAny(c.Name, "*=") || strings.Contains(c.Unit, " in ") || strings.Contains(c.Unit, " at ") {
			return true
		}
	}
	return false
}

func knownError(t *testing.T, err error) {
	var e *Error
	if !errors.As(err, &e) || e.Problem == "" || strings.ContainsFunc(err.Error(), unicode.IsControl) {
		t.Fatalf("error %q", err)
	}
}

// together reads the same bytes as one piece and byte by byte: a buffer's edge
// must not show.
func together(t *testing.T, data []byte) {
	read := func(r io.Reader) ([]Record, error) {
		f, err := Open("f", r, Options{})
		if err != nil {
			return nil, err
		}
		return readAll(f)
	}
	a, errA := read(bytes.NewReader(data))
	b, errB := read(&dribble{data})
	if len(a) != len(b) || (errA == nil) != (errB == nil) || errA != nil && errA.Error() != errB.Error() {
		t.Fatalf("%d records and %v, in pieces %d and %v", len(a), errA, len(b), errB)
	}
}

type dribble struct{ data []byte }

func (d *dribble) Read(b []byte) (int, error) {
	if len(d.data) == 0 {
		return 0, io.EOF
	}
	n := copy(b[:min(len(b), 3)], d.data)
	d.data = d.data[n:]
	return n, nil
}

func FuzzCSV(f *testing.F) {
	f.Add([]byte("time,kappa,cn (cm-3)\n2026-03-14T00:00:00Z,0.3,<5\n"))
	f.Add([]byte("\"a, \"\"b\"\"\",diameter (nm),dN/dlogDp (cm-3)\r\n\"x\ny\",50,1e3\r\n"))
	f.Add([]byte("kappa;x\n0,5;1\n"))
	f.Add([]byte("#0000000000"))
	f.Add([]byte("nu,flag"))
	f.Add([]byte("# c\n0.5,20260314T0830\n"))
	f.Add([]byte("\xef\xbb\xbfN_10 nm (cm-3),ccn 0.3% [1/cc]\n,\n"))
	f.Fuzz(func(t *testing.T, data []byte) {
		readable(t, data, Options{})
		readable(t, data, Options{Lenient: true})
		together(t, data)
	})
}

func FuzzICARTT(f *testing.F) {
	f.Add([]byte(byLines(icarttFile())))
	f.Add([]byte(strings.Join(icarttFile(), "\r\n")))
	f.Add([]byte("15, 1001\na\nb\nc\nd\n1,1\n2026,3,14,2026,3,14\n0\nt, s\n1\n1\n-9\nx\n0\n1\nt, x\n0,1\n"))
	f.Fuzz(func(t *testing.T, data []byte) {
		readable(t, data, Options{})
		readable(t, data, Options{Lenient: true})
	})
}

func FuzzNASAAmes(f *testing.F) {
	f.Add([]byte(byLines(amesFile())))
	f.Add([]byte("00 1001\n\n\n\n\n\n1 1 1 0 0 0\n\n0"))
	f.Add([]byte("15 1001\na\nb\nc\nd\n1 1\n2026 3 14 2026 3 14\n0\nseconds\n2\n1\n1\n9 9\nx\ny\n0\n0\n0 1\n2\n"))
	f.Fuzz(func(t *testing.T, data []byte) { readable(t, data, Options{}) })
}

func FuzzRole(f *testing.F) {
	f.Add("dN/dlog10D @45..55nm in cm-3 at stp")
	f.Add("time in seconds since 2026-03-14")
	f.Fuzz(func(t *testing.T, text string) {
		r, err := ParseRole(text)
		if err != nil {
			return
		}
		again, err := ParseRole(r.String())
		if err != nil || again.String() != r.String() {
			t.Fatalf("%q becomes %q and that %q: %v", text, r.String(), again.String(), err)
		}
	})
}
