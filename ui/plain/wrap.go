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
	for _, word := range Words(text) {
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

// Words are the pieces of a text that a line is not broken in: words, and numbers
// with the unit behind them.
func Words(text string) []string {
	fields := strings.Fields(text)
	out := fields[:0]
	for _, f := range fields {
		if last := len(out) - 1; last >= 0 && isNumber(out[last]) && isUnit(f) {
			out[last] += " " + f
			continue
		}
		out = append(out, f)
	}
	return out
}

// isNumber reports whether a word ends as a number does and begins as one.
func isNumber(word string) bool {
	word = strings.TrimLeft(word, "(<[-+")
	return word != "" && isDigit(word[0]) && isDigit(word[len(word)-1])
}

func isDigit(c byte) bool { return '0' <= c && c <= '9' }

// units are those that numbers carry in sentences, also as ASCII writes them.
var units = map[string]bool{
	"%": true, "°C": true, "C": true, "K": true, "nm": true, "µm": true, "um": true, "mN/m": true,
	"mol/kg": true, "kg/m³": true, "kg/m3": true, "kg/mol": true, "hPa": true, "wt%": true,
}

func isUnit(word string) bool { return units[strings.TrimRight(word, ".,;:)>]")] }
