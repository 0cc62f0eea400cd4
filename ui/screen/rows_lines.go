package screen

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// How the rows of a list are drawn.

// lines are the line above, the rows with what belongs to them, and the sums; an
// error or what an entry takes stands below.
func (r *rows) lines(w, h int, m *model) []string {
	l, grid := r.grid(m)
	if grid == nil || h < 1 {
		return nil
	}
	r.settle(grid)
	form := formOf(l)
	head := " " + r.fill(form.head, 0, grid[0], m)
	var foot []string
	switch {
	case r.entry != nil:
		foot = r.entry.hint(w, m)
	case r.wrong != nil:
		foot = m.refused(r.wrong, w)
	}
	body, at := r.body(l, grid, form, w, m)
	room := max(h-1-len(foot), 1)
	r.scroll.reveal(at, room)
	first, end := r.scroll.part(len(body), room)
	if end-first < len(body) {
		head += m.dim(fmt.Sprintf("  (line %d to %d of %d)", first+1, end, len(body)))
	}
	return fit(slices.Concat([]string{head}, body[first:end], foot), w, h)
}

// body is every row and, of several, the sums, and the line that the choice is on.
func (r *rows) body(l scenario.RowList, grid [][]scenario.Input, form rowForm, w int, m *model) (body []string, at int) {
	var each []float64
	mixed := math.NaN()
	if form.shares {
		each, mixed = answer.Hygroscopicity(m.env, m.scenario)
	}
	column := 24 // where the settings stand, behind their names
	for _, row := range grid[1:] {
		column = max(column, ansi.StringWidth(m.text(row[0].Says()))+1)
	}
	for i, row := range grid[1:] {
		i++
		if i == r.row {
			at = len(body)
		}
		if r.settings() {
			body = append(body, "   "+padded(m.text(row[0].Says()), column)+r.slotText(i, 0, row[0], m))
			continue
		}
		sentence := form.sentence(l, row)
		lines := r.clauses(fmt.Sprintf("  %2d  ", i), sentence, i, row, w, m)
		if i == r.row {
			at += lineOf(lines, "<")
		}
		body = append(body, lines[:len(lines)-1]...)
		line := lines[len(lines)-1]
		if i <= len(each) && !math.IsNaN(each[i-1]) {
			line = beside(line, fmt.Sprintf("kappa %.3f", each[i-1]), w)
		}
		body = append(body, line)
		if more := r.more(i, sentence, row, w, m); len(more) > 0 {
			if i == r.row && !names(sentence, row[r.slot]) {
				at = len(body) + lineOf(more, "<")
			}
			body = append(body, more...)
		}
	}
	switch {
	case r.adding:
		at = len(body)
		body = append(body, fmt.Sprintf("  %2d  ", len(grid))+m.marked("<"+m.text(r.entry.field.show(w-10))+">"))
	case l != nil && l.Len() == 0:
		body = append(body, "      none: a adds one")
	}
	if form.shares && l.Len() > 1 {
		body = append(body, m.dim("      "+m.text(sums(l, mixed))))
	}
	return body, at
}

// clauses are the sentence of a row, on as many lines as its clauses need.
func (r *rows) clauses(line, sentence string, row int, inputs []scenario.Input, w int, m *model) (out []string) {
	const indent = "        "
	for i, clause := range strings.Split(sentence, "\n") {
		text := r.fill(clause, row, inputs, m)
		switch {
		case i == 0:
			line += text
		case ansi.StringWidth(line)+1+ansi.StringWidth(text) > w:
			out, line = append(out, line), indent+text
		default:
			line += " " + text
		}
	}
	return append(out, line)
}

// names reports whether a sentence has a slot for an input.
func names(sentence string, in scenario.Input) bool {
	return strings.Contains(sentence, "{"+in.Key()+"}")
}

// lineOf is the first line that holds a text.
func lineOf(lines []string, text string) int {
	return max(slices.IndexFunc(lines, func(l string) bool { return strings.Contains(l, text) }), 0)
}

// fill puts the slots of a row into its sentence.
func (r *rows) fill(sentence string, row int, inputs []scenario.Input, m *model) string {
	return answer.Fill(sentence, func(key string) string {
		for i, in := range inputs {
			if in.Key() == key {
				return r.slotText(row, i, in, m)
			}
		}
		return ""
	})
}

// slotText is a value as a slot, or the text being typed in its place.
func (r *rows) slotText(row, slot int, in scenario.Input, m *model) string {
	text := m.brief(in, shownTyped)
	if row != r.row || slot != r.slot || r.adding {
		return m.value("[" + text + "]")
	}
	if r.entry != nil {
		text = m.text(r.entry.field.show(shownTyped))
	}
	return m.marked("<" + text + ">")
}

// brief is the value of an input in at most w columns. Of the name of a file the
// end says most.
func (m *model) brief(in scenario.Input, w int) string {
	text := m.text(in.Show(m.style()))
	if in.Kind() == scenario.Name && text == noSubstance && strings.HasPrefix(string(in.Path()), "mode[") {
		text = "that of the question"
	}
	switch wide := ansi.StringWidth(text); {
	case in.Kind() == scenario.File && wide > w:
		return ansi.TruncateLeft(text, wide-w+3, "...")
	case in.Kind() == scenario.Text || in.Kind() == scenario.Numbers:
		return cut(text, 2*w)
	}
	return text
}

// noSubstance is what stands for a substance that is not named.
const noSubstance = "values of its own"

// shownTyped is how much of a text being typed is seen in its slot.
const shownTyped = 30

// more is what else belongs to a row, beside what its sentence names: all of it
// below the chosen row, below the others only what is not the default, so that
// nothing is hidden.
func (r *rows) more(row int, sentence string, inputs []scenario.Input, w int, m *model) []string {
	var parts []string
	for i, in := range inputs {
		if !names(sentence, in) && (row == r.row || !in.IsDefault() && isMeasured(in)) {
			parts = append(parts, m.text(in.Says())+" "+r.slotText(row, i, in, m))
		}
	}
	const indent = "        "
	var out []string
	line := ""
	for i, p := range parts {
		if i < len(parts)-1 {
			p += ","
		}
		switch {
		case line == "":
			line = indent + p
		case ansi.StringWidth(line)+1+ansi.StringWidth(p) > min(w, textWidth):
			out = append(out, line)
			line = indent + p
		default:
			line += " " + p
		}
	}
	if line != "" {
		out = append(out, line)
	}
	return out
}

// beside sets a remark at the right of a line if there is room.
func beside(line, remark string, w int) string {
	const column = 62
	at := min(w-ansi.StringWidth(remark)-1, column)
	if ansi.StringWidth(line)+2 > at {
		at = ansi.StringWidth(line) + 2
	}
	if at+ansi.StringWidth(remark) > w {
		return line
	}
	return padded(line, at) + remark
}

// sums says what the shares add up to and what the mixture is.
func sums(l scenario.RowList, mixed float64) string {
	total := 0.0
	for i := range l.Len() {
		for _, in := range l.Row(i) {
			if in.Key() != "share" {
				continue
			}
			if _, v := in.SI(); v != nil {
				x, _ := v.(float64)
				total += x
			}
		}
	}
	says := fmt.Sprintf("%.4g in all", total)
	if math.Abs(total-1) > 1e-9 {
		says += ", scaled to 1"
	}
	if !math.IsNaN(mixed) {
		says += fmt.Sprintf("; mixture kappa %.3f", mixed)
	}
	return says
}
