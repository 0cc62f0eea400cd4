package screen

import (
	"fmt"
	"strconv"
	"strings"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"
	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/answer"
)

// table shows the tables of the answer, one at a time.
type table struct {
	which  int
	scroll scroll
}

// newTable opens the first table of the answer.
func newTable(m *model) panel {
	if len(m.answer.Tables) == 0 {
		return newReader("Table", []string{"This answer has no table."})
	}
	return &table{}
}

func (t *table) press(k tea.KeyMsg, m *model) (panel, tea.Cmd) {
	which := t.which
	switch {
	case hits(k, m.keys.Leave, m.keys.Take, m.keys.Table):
		return nil, nil
	case hits(k, m.keys.FieldLeft):
		which = max(which-1, 0)
	case hits(k, m.keys.FieldRight):
		which = min(which+1, len(m.answer.Tables)-1)
	default:
		t.scroll.press(k, m.keys)
	}
	if which != t.which {
		t.which, t.scroll = which, scroll{}
	}
	return t, nil
}

// lines keeps title and column heads in place while the rows scroll.
func (t *table) lines(w, h int, m *model) []string {
	n := len(m.answer.Tables)
	if n == 0 {
		return fit([]string{" This answer has no table."}, w, h)
	}
	of := m.answer.Tables[min(t.which, n-1)]
	heads, body := tabulate(of, w-1, m)
	first, end := t.scroll.part(len(body), max(h-1-len(heads), 0))
	title := of.Title
	if n > 1 {
		title = fmt.Sprintf("%s (table %d of %d)", title, min(t.which, n-1)+1, n)
	}
	out := []string{heading(title, first, end, len(body), "row", w, m)}
	for _, l := range heads {
		out = append(out, m.dim(" "+l))
	}
	for _, l := range body[first:end] {
		out = append(out, " "+l)
	}
	if len(body) == 0 {
		out = append(out, m.dim(" no rows"))
	}
	return fit(out, w, h)
}

func (t *table) keys(k keyMap) []key.Binding {
	return []key.Binding{k.LineUp, k.LineDown, k.PageUp, k.PageDown, k.TopLine, k.BottomLine, k.FieldLeft, k.FieldRight, k.Leave}
}

// shape is how much a table is pressed together: significant digits, and the
// widest head of a column, 0 for any.
type shape struct{ digits, head int }

// shapes are tried in this order until the table fits.
var shapes = []shape{{6, 0}, {6, 12}, {5, 12}, {4, 10}}

const columnGap = 2 // blanks between columns

// tabulate lays a table out in w columns. One that is too wide even when pressed
// together loses its last columns, and says so by a column of dots.
func tabulate(t answer.Table, w int, m *model) (heads, body []string) {
	var columns [][]string
	for _, s := range shapes {
		columns = columnsOf(t, s, m)
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
func columnsOf(t answer.Table, s shape, m *model) [][]string {
	heads := make([][]string, len(t.Columns))
	deepest := 0
	for i, c := range t.Columns {
		heads[i] = headOf(m.text(c.Says), s.head)
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
			column = append(column, cellText(row[i], s.digits, m))
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
func cellText(v any, digits int, m *model) string {
	switch v := v.(type) {
	case float64:
		return fmt.Sprintf("%#.*g", digits, v) // with its zeros, so that decimals stand in line
	case int:
		return strconv.Itoa(v)
	case string:
		return m.text(v)
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
			column[i] = padded(c, wide)
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
