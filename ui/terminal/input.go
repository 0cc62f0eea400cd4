package terminal

import (
	"os"
	"sync"
	"time"
	"unicode/utf8"
)

// holdKey is how long the beginning of a key waits for its rest. Long enough for
// the pieces of one key on a slow line, too short for a person to notice.
const holdKey = 40 * time.Millisecond

// longest is the length of the longest sequence that is waited for. The longest
// that a key sends is ten bytes or so.
const longest = 32

const esc = 0x1b

// Input is a terminal whose keys arrive whole. An arrow key is sent as ESC, "[",
// "B", and a slow line may deliver it in pieces; read piece by piece it would be
// the key Esc and some text. Input keeps a piece that is not yet a key for up to
// 40 ms and joins it with what follows; so it does with the bytes of one
// character.
//
// It is the file in every other respect, which is what Bubble Tea needs: it sets
// the raw mode through Fd, waits on Fd until there is something to read, and can
// cancel that wait. Nothing is ever kept between two reads, so that this wait
// never sleeps over something already read.
type Input struct {
	*os.File
	hold    time.Duration
	reading sync.Mutex
}

// NewInput returns f as an input whose keys arrive whole.
func NewInput(f *os.File) *Input { return &Input{File: f, hold: holdKey} }

// Read reads what has arrived, and the rest of its last key if that comes in
// time. When the rest brings an error, the beginning is returned first: the
// error comes again at the next call.
func (in *Input) Read(p []byte) (int, error) {
	in.reading.Lock()
	defer in.reading.Unlock()
	// Room for the rest of a key. Bubble Tea brings 256 bytes.
	first := p
	if len(p) > 2*longest {
		first = p[:len(p)-longest]
	}
	n, err := in.File.Read(first)
	if err != nil {
		return n, err
	}
	for n < len(p) && begun(p[:n]) && in.ready(in.hold) {
		// One byte at a time, or the beginning of the next key would come along.
		m, err := in.File.Read(p[n : n+1])
		n += m
		if err != nil || m == 0 {
			break
		}
	}
	return n, nil
}

// begun reports whether b ends in the middle of a key: within a control
// sequence, or within a character.
func begun(b []byte) bool {
	tail := b[max(0, len(b)-longest):]
	for i := len(tail) - 1; i >= 0; i-- {
		if tail[i] == esc {
			return sequenceBegun(tail[i+1:])
		}
	}
	return characterBegun(tail)
}

// sequenceBegun reports whether a sequence is incomplete whose bytes after the
// last ESC are s: ESC alone; ESC O and one byte; ESC [ and then parameters
// (0x30-0x3f) and intermediates (0x20-0x2f) up to one final byte (0x40-0x7e), by
// ECMA-48. The Linux console sends ESC [ [ A for F1.
func sequenceBegun(s []byte) bool {
	if len(s) == 0 {
		return true
	}
	switch s[0] {
	case 'O':
		return len(s) == 1 || characterBegun(s)
	case '[':
		s = s[1:]
	default:
		return characterBegun(s)
	}
	if len(s) > 0 && s[0] == '[' {
		return len(s) == 1
	}
	for _, c := range s {
		if c < 0x20 || c > 0x3f {
			// The final byte; what follows it is text.
			return characterBegun(s)
		}
	}
	return true
}

// characterBegun reports whether b ends with the first bytes of a character of
// several bytes.
func characterBegun(b []byte) bool {
	for i := 1; i <= min(len(b), utf8.UTFMax); i++ {
		if c := b[len(b)-i]; utf8.RuneStart(c) {
			return c >= utf8.RuneSelf && !utf8.FullRune(b[len(b)-i:])
		}
	}
	return false
}
