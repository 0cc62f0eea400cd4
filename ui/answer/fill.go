package answer

import "strings"

// Fill puts values into the {slots} of a clause.
func Fill(clause string, value func(slot string) string) string {
	var b strings.Builder
	for {
		text, rest, found := strings.Cut(clause, "{")
		b.WriteString(text)
		if !found {
			return b.String()
		}
		slot, after, closed := strings.Cut(rest, "}")
		if !closed {
			return b.String() + "{" + rest
		}
		b.WriteString(value(slot))
		clause = after
	}
}
