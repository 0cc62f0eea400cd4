package form

import (
	"fmt"
	"strconv"
	"strings"

	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/answer"
)

// shape is how much a table is pressed together: significant digits, and the
// widest head of a column, 0 for any.
type shape struct{ digits, head int }

// shapes are tried in this order until the table fits.
var shapes = []shape{{6, 0}, {6, 12}, {5, 12}, {4, 10}}

const columnGap = 2 // blanks between columns

// Tabulate lays a table out in lines of at most w columns; text makes heads and
// words fit for who shows them. A table that is too wide even when pressed together
// loses its last columns, and says so by a column of dots.
func Tabulate(t answer.Table, w int, text func(string) string) (heads, body []string) {
	var columns [][]string
	for _, s := range shapes {
		columns = columnsOf(t, s, text)
		if wideness(columns) <= w {
			return rowsOf(columns, len(columns[0])-len(t.Rows))
		}
	}
	height := len(columns[0])
	for len(columns) > 1 && wideness(columns)+columnGap+3 > w {
		columns = columns[:len(columns)-1]
	}
	dots := make([]string, height)
	for i := range dots {
		dots[i] = "..."
	}
	return rowsOf(append(columns, dots), height-len(t.Rows))
}

// columnsOf are the columns with their heads, every cell of a column equally wide.
func columnsOf(t answer.Table, s shape, text func(string) string) [][]string {
	heads := make([][]string, len(t.Columns))
	deepest := 0
	for i, c := range t.Columns {
		heads[i] = headOf(text(c.Says), s.head)
		deepest = max(deepest, len(heads[i]))
	}
	columns := make([][]string, len(t.Columns))
	for i := range t.Columns {
		column := make([]string, deepest-len(heads[i]), deepest+len(t.Rows))
		column = append(column, heads[i]...)
		numbers := true
		for _, row := range t.Rows {
			if _, isText := row[i].(string); isText {
				numbers = false
			}
			column = append(column, cellText(row[i], s.digits, text))
		}
		columns[i] = aligned(column, numbers)
	}
	return columns
}

// headOf breaks a head into its words; longer ones than most are divided.
func headOf(says string, most int) []string {
	var out []string
	for _, word := range strings.Fields(says) {
		for most > 0 && ansi.StringWidth(word) > most {
			out = append(out, ansi.Truncate(word, most-1, "")+"-")
			word = ansi.TruncateLeft(word, most-1, "")
		}
		if n := len(out) - 1; n >= 0 && len(word) <= 3 { // a unit stands behind its quantity
			if joined := out[n] + " " + word; most == 0 || ansi.StringWidth(joined) <= most {
				out[n] = joined
				continue
			}
		}
		out = append(out, word)
	}
	return out
}

// cellText is a value in a table, a hyphen where it is absent.
func cellText(v any, digits int, text func(string) string) string {
	switch v := v.(type) {
	case float64:
		return fmt.Sprintf("%#.*g", digits, v) // with its zeros, so that decimals stand in line
	case int:
		return strconv.Itoa(v)
	case string:
		return text(v)
	case bool:
		if v {
			return "yes"
		}
		return "no"
	}
	return "-"
}

// aligned fills the cells of a column up: numbers to the right, words to the left.
func aligned(column []string, right bool) []string {
	wide := 0
	for _, c := range column {
		wide = max(wide, ansi.StringWidth(c))
	}
	for i, c := range column {
		if right {
			column[i] = strings.Repeat(" ", wide-ansi.StringWidth(c)) + c
		} else {
			column[i] = c + strings.Repeat(" ", wide-ansi.StringWidth(c))
		}
	}
	return column
}

func wideness(columns [][]string) int {
	w := columnGap * (len(columns) - 1)
	for _, c := range columns {
		w += ansi.StringWidth(c[0])
	}
	return w
}

// rowsOf joins columns to lines; the first ones are heads.
func rowsOf(columns [][]string, heads int) (head, body []string) {
	lines := make([]string, len(columns[0]))
	row := make([]string, len(columns))
	for i := range lines {
		for j, c := range columns {
			row[j] = c[i]
		}
		lines[i] = strings.TrimRight(strings.Join(row, strings.Repeat(" ", columnGap)), " ")
	}
	return lines[:heads], lines[heads:]
}
