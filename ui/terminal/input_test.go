package terminal

import (
	"errors"
	"io"
	"os"
	"strings"
	"testing"
	"time"
)

func TestBegun(t *testing.T) {
	for name, c := range map[string]struct {
		bytes string
		want  bool
	}{
		"nothing":                        {"", false},
		"text":                           {"0.25 um", false},
		"lone ESC":                       {"\x1b", true},
		"ESC after text":                 {"12\x1b", true},
		"two ESC, the start of alt+down": {"\x1b\x1b", true},
		"ESC and a letter":               {"\x1bq", false},
		"introducer":                     {"\x1b[", true},
		"down":                           {"\x1b[B", false},
		"down and the start of the next": {"\x1b[B\x1b[", true},
		"down and text":                  {"\x1b[B12", false},
		"page up without its end":        {"\x1b[5", true},
		"page up":                        {"\x1b[5~", false},
		"ctrl+right without its end":     {"\x1b[1;5", true},
		"ctrl+right":                     {"\x1b[1;5C", false},
		"application down, its start":    {"\x1bO", true},
		"application down":               {"\x1bOB", false},
		"F1 of the Linux console, start": {"\x1b[[", true},
		"F1 of the Linux console":        {"\x1b[[A", false},
		"start of a paste":               {"\x1b[200", true},
		"a pasted text":                  {"\x1b[200~0.5\x1b[201~", false},
		"half a µ":                       {"12 \xc2", true},
		"µ":                              {"12 µ", false},
		"half a µ after an arrow":        {"\x1b[B\xc2", true},
		"half a µ after ESC":             {"\x1b\xc2", true},
		"half a µ after application F1":  {"\x1bOP\xc2", true},
		"three quarters of a 4-byte one": {"\xf0\x9f\x92", true},
		"bytes that begin nothing":       {"\xff\xfe", false},
		"continuation bytes alone":       {"\x80\x80\x80\x80\x80", false},
		"a sequence that never ends":     {"\x1b[" + strings.Repeat("1", longest), false},
		"a control character within one": {"\x1b[1\r", false},
	} {
		if got := begun([]byte(c.bytes)); got != c.want {
			t.Errorf("%s: begun(%q) is %t, want %t", name, c.bytes, got, c.want)
		}
	}
}

// pieces writes the pieces with that pause between them to an Input and returns
// what each read brought. The last read ends with the end of the file.
func pieces(t *testing.T, hold, pause time.Duration, size int, parts ...string) []string {
	t.Helper()
	r, w, err := os.Pipe()
	if err != nil {
		t.Fatal(err)
	}
	defer r.Close()
	sent := make(chan error, 1)
	go func() {
		defer w.Close()
		for i, part := range parts {
			if i > 0 {
				time.Sleep(pause)
			}
			if _, err := io.WriteString(w, part); err != nil {
				sent <- err
				return
			}
		}
		sent <- nil
	}()
	in := NewInput(r)
	in.hold = hold
	var got []string
	buf := make([]byte, size)
	for {
		n, err := in.Read(buf)
		if n > 0 {
			got = append(got, string(buf[:n]))
		}
		if errors.Is(err, io.EOF) {
			break
		}
		if err != nil {
			t.Fatal(err)
		}
	}
	if err := <-sent; err != nil {
		t.Fatal(err)
	}
	return got
}

// bubbleTea is the size of the buffer that Bubble Tea v1 reads into.
const bubbleTea = 256

func TestPiecesAreJoined(t *testing.T) {
	// A pause is short or long against the time that a key is held; both are far
	// from it, so that a busy machine changes nothing.
	const pause = 5 * time.Millisecond
	const soon, late = 1000 * pause, pause / 20
	for name, c := range map[string]struct {
		hold  time.Duration
		parts []string
		want  []string
	}{
		"an arrow in two pieces":      {soon, []string{"\x1b", "[B"}, []string{"\x1b[B"}},
		"an arrow in three pieces":    {soon, []string{"\x1b", "[", "B"}, []string{"\x1b[B"}},
		"a piece takes no key along":  {soon, []string{"\x1b", "[Bq"}, []string{"\x1b[B", "q"}},
		"a lone ESC is not kept long": {late, []string{"\x1b", "q"}, []string{"\x1b", "q"}},
		"too late to be one key":      {late, []string{"\x1b", "[B"}, []string{"\x1b", "[B"}},
		"a character in two pieces":   {soon, []string{"12 \xc2", "\xb5m"}, []string{"12 µ", "m"}},
		"ESC at the end of the file":  {soon, []string{"\x1b"}, []string{"\x1b"}},
		"whole keys do not wait":      {late, []string{"\x1b[A", "\x1b[B"}, []string{"\x1b[A", "\x1b[B"}},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			got := pieces(t, c.hold, pause, bubbleTea, c.parts...)
			if strings.Join(got, "|") != strings.Join(c.want, "|") {
				t.Errorf("read %q, want %q", got, c.want)
			}
		})
	}
}

// Whatever arrives and however it is cut, nothing is lost, added or reordered,
// and a full buffer never ends in the middle of a key: Bubble Tea would take the
// two halves for two keys.
func TestNothingIsLost(t *testing.T) {
	long := strings.Repeat("\x1b[B\x1b[1;5C12 µm\x1b[5~", 60)
	for name, c := range map[string]struct {
		size  int
		parts []string
	}{
		"more than a buffer at once": {bubbleTea, []string{long}},
		"a tiny buffer":              {3, []string{long}},
		"one byte":                   {1, []string{"\x1b[B"}},
		"in two parts":               {bubbleTea, []string{long[:301], long[301:]}},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			got := pieces(t, time.Second, time.Millisecond, c.size, c.parts...)
			if all := strings.Join(got, ""); all != strings.Join(c.parts, "") {
				t.Errorf("read %q, want %q", all, c.parts)
			}
			for _, piece := range got {
				if c.size == bubbleTea && begun([]byte(piece)) {
					t.Errorf("a read ends in the middle of a key: %q", piece)
				}
			}
		})
	}
}

func TestHoldIsShort(t *testing.T) {
	r, w, err := os.Pipe()
	if err != nil {
		t.Fatal(err)
	}
	defer r.Close()
	defer w.Close()
	if _, err := io.WriteString(w, "\x1b"); err != nil {
		t.Fatal(err)
	}
	start := time.Now()
	n, err := NewInput(r).Read(make([]byte, bubbleTea))
	if n != 1 || err != nil {
		t.Fatalf("read %d bytes, error %v", n, err)
	}
	took := time.Since(start)
	t.Logf("a lone ESC was held for %v", took)
	if took < holdKey-2*time.Millisecond {
		t.Errorf("a lone ESC was held for %v only, want %v", took, holdKey)
	}
	if took > time.Second {
		t.Errorf("a lone ESC was held for %v, want %v", took, holdKey)
	}
}
