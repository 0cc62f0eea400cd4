package screen

import (
	"slices"
	"strings"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/plain"
)

// longestText is more than any value, substance or file name needs; a pasted
// document ends there.
const longestText = 300

// field is one line of text that is being typed. Its cursor stands still: one
// that blinks would send bytes down the line for nothing.
type field struct {
	text []rune
	at   int // the cursor stands before text[at]
}

func newField(text string) field {
	var f field
	f.insert(text)
	return f
}

func (f *field) String() string { return strings.TrimSpace(string(f.text)) }

// press takes a key that edits the line and reports whether it was one. Text is
// what a person typed or pasted, so it is cleaned like text from a file.
func (f *field) press(k tea.KeyMsg, keys keyMap) bool {
	switch {
	case k.Alt:
		return false
	case k.Type == tea.KeyRunes, k.Type == tea.KeySpace:
		f.insert(string(k.Runes))
	case hits(k, keys.EraseBefore):
		if f.at > 0 {
			f.at--
			f.erase()
		}
	case hits(k, keys.EraseUnder):
		f.erase()
	case hits(k, keys.FieldLeft):
		f.at = max(f.at-1, 0)
	case hits(k, keys.FieldRight):
		f.at = min(f.at+1, len(f.text))
	case hits(k, keys.TopLine):
		f.at = 0
	case hits(k, keys.BottomLine):
		f.at = len(f.text)
	default:
		return false
	}
	return true
}

// erase takes out the character under the cursor.
func (f *field) erase() {
	if f.at < len(f.text) {
		f.text = slices.Delete(f.text, f.at, f.at+1)
	}
}

func (f *field) insert(text string) {
	add := []rune(plain.Clean(text))
	add = add[:min(len(add), max(longestText-len(f.text), 0))]
	// A new slice: what is typed must not write into the text of another field.
	f.text = append(append(append(make([]rune, 0, len(f.text)+len(add)), f.text[:f.at]...), add...), f.text[f.at:]...)
	f.at += len(add)
}

// show is the line with its cursor in at most w columns, which always include
// the cursor.
func (f *field) show(w int) string {
	before, after := string(f.text[:f.at])+"|", string(f.text[f.at:])
	if cut := ansi.StringWidth(before) - w; cut > 0 {
		before = ansi.TruncateLeft(before, cut, "")
	}
	return ansi.Truncate(before+after, max(w, 0), "")
}

// typing are the keys of a panel that is one field.
func typing(k keyMap) []key.Binding {
	return []key.Binding{k.Take, k.EraseBefore, k.EraseUnder, k.FieldLeft, k.FieldRight, k.TopLine, k.BottomLine, k.Leave}
}
