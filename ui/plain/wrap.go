package plain

import (
	"strings"

	"github.com/charmbracelet/x/ansi"
)

// Wrap breaks a text at blanks into lines of at most width cells, each after the
// indent. A word that is longer stays whole: it may be something to copy.
func Wrap(text string, width int, indent string) string {
	var b strings.Builder
	used := 0
	for _, word := range strings.Fields(text) {
		size := ansi.StringWidth(word)
		switch {
		case used == 0:
			b.WriteString(indent)
			used = len(indent)
		case used+1+size > width:
			b.WriteString("\n" + indent)
			used = len(indent)
		default:
			b.WriteByte(' ')
			used++
		}
		b.WriteString(word)
		used += size
	}
	return b.String()
}
