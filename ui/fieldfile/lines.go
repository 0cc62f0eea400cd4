package fieldfile

import (
	"bytes"
	"errors"
	"io"
)

// longestLine bounds the memory that a wrong file can take. A size spectrum of a
// thousand bins is a line of 20 kB.
const longestLine = 16 << 20

var errLongLine = errors.New("a line is longer than 16 MiB")

// lines reads a file by lines into a buffer of its own. The line that next
// returned stays valid until the next call.
type lines struct {
	src      io.Reader
	buf      []byte
	from, to int // what is read but not handed out yet
	number   int // of the line handed out last
	end      error
	ended    bool // the last line handed out had a line end
	held     bool // the last line is to be handed out again
	last     []byte
}

const firstBuffer = 64 << 10

func newLines(src io.Reader) *lines { return &lines{src: src, buf: make([]byte, firstBuffer)} }

// head shows up to n bytes of the beginning without taking them.
func (l *lines) head(n int) []byte {
	for l.to-l.from < n && l.end == nil {
		l.fill()
	}
	return l.buf[l.from:min(l.to, l.from+n)]
}

// skip drops bytes of the beginning, such as a byte order mark.
func (l *lines) skip(n int) { l.from += n }

// again makes next hand out the last line once more.
func (l *lines) again() {
	l.held = true
	l.number--
}

// next returns the next line without its end (LF or CR LF).
func (l *lines) next() ([]byte, error) {
	if l.held {
		l.held = false
		l.number++
		return l.last, nil
	}
	searched := 0
	for {
		if i := bytes.IndexByte(l.buf[l.from+searched:l.to], '\n'); i >= 0 {
			line := l.buf[l.from : l.from+searched+i]
			l.from += searched + i + 1
			return l.hand(line, true), nil
		}
		searched = l.to - l.from
		if l.end != nil {
			break
		}
		if searched > longestLine {
			return nil, errLongLine
		}
		l.fill()
	}
	if searched == 0 || l.end != io.EOF {
		return nil, l.end
	}
	line := l.buf[l.from:l.to]
	l.from = l.to
	return l.hand(line, false), nil
}

func (l *lines) hand(line []byte, ended bool) []byte {
	if n := len(line); n > 0 && line[n-1] == '\r' {
		line = line[:n-1]
	}
	l.number++
	l.ended, l.last = ended, line
	return line
}

// fill reads more, after making room.
func (l *lines) fill() {
	if l.from > 0 {
		l.to = copy(l.buf, l.buf[l.from:l.to])
		l.from = 0
	}
	if l.to == len(l.buf) {
		l.buf = append(l.buf, make([]byte, len(l.buf))...)
	}
	const patience = 100 // empty reads, as in bufio
	for range patience {
		n, err := l.src.Read(l.buf[l.to:])
		l.to += n
		l.end = err
		if n > 0 || err != nil {
			return
		}
	}
	l.end = io.ErrNoProgress
}
