package fieldfile

import (
	"fmt"
	"strconv"
	"strings"
	"unicode/utf8"

	"dropcrest/ui/plain"
)

// Error says where a file is wrong and what would be right.
type Error struct {
	File         string
	Line, Column int    // from 1, in characters; 0: the whole file or line
	Problem      string // "\"3,5\" is no number"
	Right        string // "a point as the decimal sign"; "" where nothing more can be said
	Err          error  // of the source, such as a failing disk; nil: the content is wrong
}

func (e *Error) Error() string {
	var b strings.Builder
	b.WriteString(e.File)
	if e.Line > 0 {
		fmt.Fprintf(&b, ":%d", e.Line)
		if e.Column > 0 {
			fmt.Fprintf(&b, ":%d", e.Column)
		}
	}
	b.WriteString(": " + e.Problem)
	if e.Right != "" {
		b.WriteString(": want " + e.Right)
	}
	return b.String()
}

func (e *Error) Unwrap() error { return e.Err }

// Note is something to know about a file that does not stop the reading.
type Note struct {
	Code  string // "no_offset": the same for the same kind of note
	Line  int    // of the first time; 0: the whole file
	Count int    // how often
	Text  string
}

func (n Note) String() string {
	switch {
	case n.Line == 0:
		return n.Text
	case n.Count == 1:
		return fmt.Sprintf("line %d: %s", n.Line, n.Text)
	}
	return fmt.Sprintf("line %d and %d more: %s", n.Line, n.Count-1, n.Text)
}

// notes keeps the first of each kind and counts the others, so that a long file
// with one habit needs one line.
type notes struct {
	list []Note
	at   map[string]int
}

func (n *notes) add(code string, line int, format string, values ...any) {
	if i, ok := n.at[code]; ok {
		n.list[i].Count++
		return
	}
	if n.at == nil {
		n.at = map[string]int{}
	}
	n.at[code] = len(n.list)
	n.list = append(n.list, Note{code, line, 1, fmt.Sprintf(format, values...)})
}

// quoted shows text of a file inside a message: clean and short.
func quoted[T string | []byte](s T) string {
	const most = 40
	text := plain.Clean(strings.ToValidUTF8(string(s[:min(len(s), 8*most)]), "?"))
	if utf8.RuneCountInString(text) > most {
		text = string([]rune(text)[:most-1]) + "…"
	}
	return strconv.Quote(text)
}

// clean is text of a file that may be shown: names, units, comments.
func clean[T string | []byte](s T) string {
	return strings.TrimSpace(plain.Clean(strings.ToValidUTF8(string(s), "?")))
}
