package answer

import "dropcrest/atmos"

// findingOf is the answer in sentences: those that say something, and the first note
// that limits the answer. One limit is enough to read; all of them are in the notes.
func findingOf(sentences []string, notes []atmos.Note, limits func(atmos.Note) bool) []string {
	var out []string
	for _, says := range sentences {
		if says != "" {
			out = append(out, says)
		}
	}
	for _, n := range notes {
		if limits(n) {
			return append(out, capital(n.Text))
		}
	}
	return out
}
