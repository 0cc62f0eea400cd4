// Package near finds the word that a mistyped one means.
package near

import "strings"

// Word is the word that is meant by a mistyped one, "" when none is close: at
// most a third of its letters differ, or one is the beginning of the other.
func Word(typed string, words []string) string {
	typed = strings.ToLower(typed)
	best, least := "", 1+len(typed)/3
	for _, w := range words {
		d := distance(typed, w)
		if len(typed) >= 3 && strings.HasPrefix(w, typed) {
			d = min(d, 1)
		}
		if d <= least && (best == "" || d < least) {
			best, least = w, d
		}
	}
	return best
}

// distance is the number of letters to insert, drop or exchange.
func distance(a, b string) int {
	row := make([]int, len(b)+1)
	for j := range row {
		row[j] = j
	}
	for i := range len(a) {
		diagonal := row[0]
		row[0] = i + 1
		for j := range len(b) {
			cost := diagonal
			if a[i] != b[j] {
				cost++
			}
			diagonal = row[j+1]
			row[j+1] = min(cost, row[j]+1, row[j+1]+1)
		}
	}
	return row[len(b)]
}
