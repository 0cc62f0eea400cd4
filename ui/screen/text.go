package screen

import (
	"strings"

	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/plain"
)

// textWidth is the widest that text may be: longer lines are hard to read.
const textWidth = 100

// token is what a line is never broken in: a word, or a slot with its value.
type token struct {
	text  string // as it is shown, with colours
	width int
}

func wordToken(s string) token { return token{s, ansi.StringWidth(s)} }

// flow lays tokens out in lines of at most w columns, one blank between them. A
// token that is wider is cut.
func flow(tokens []token, w int) []string {
	var lines []string
	var b strings.Builder
	used := 0
	for _, t := range tokens {
		if used > 0 && used+1+t.width > w {
			lines = append(lines, b.String())
			b.Reset()
			used = 0
		}
		if used > 0 {
			b.WriteByte(' ')
			used++
		}
		b.WriteString(cut(t.text, w))
		used += min(t.width, w)
	}
	if used > 0 {
		lines = append(lines, b.String())
	}
	return lines
}

// wrap breaks a text at blanks into lines of at most w columns.
func wrap(text string, w int) []string { return flow(words(text), w) }

// words are the tokens of a text.
func words(text string) []token {
	var out []token
	for _, w := range plain.Words(text) {
		out = append(out, wordToken(w))
	}
	return out
}

// cut is s in at most w columns; dots show that something is left out.
func cut(s string, w int) string {
	if ansi.StringWidth(s) <= w {
		return s
	}
	if w < 8 {
		return ansi.Truncate(s, max(w, 0), "")
	}
	return ansi.Truncate(s, w, "...")
}

// indented puts one blank before every line.
func indented(lines []string) []string {
	for i := range lines {
		lines[i] = " " + lines[i]
	}
	return lines
}

// fit cuts lines to a window of that size: no line wider, no line too many.
// Bubble Tea would drop the first lines, not the last ones.
func fit(lines []string, w, h int) []string {
	lines = lines[:min(len(lines), max(h, 0))]
	for i, line := range lines {
		lines[i] = cut(line, w)
	}
	return lines
}
