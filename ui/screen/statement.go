package screen

import (
	"fmt"
	"strings"

	"github.com/charmbracelet/x/ansi"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// slotMark stands around the name of a slot while a clause is cut into words. No
// statement contains it.
const slotMark = "\x00"

// mostClauses is the number of lines that clauses may have for themselves while
// the window is low.
const mostClauses = 5

// statement is the question in prose in lines of at most w columns. A clause
// begins a new line where there is room for that; the chosen slot is <value>, the others are [value].
func (m *model) statement(w int) []string {
	w = min(w, textWidth) - 2
	var lines []string
	var all []token
	for _, clause := range m.question.Statement(m.scenario) {
		tokens := m.tokens(clause, w)
		lines, all = append(lines, flow(tokens, w)...), append(all, tokens...)
	}
	if !m.roomy() || !m.airy() && len(lines) > mostClauses {
		lines = flow(all, w)
	}
	return indented(lines)
}

// tokens are the words of a clause; a slot and what stands close to it are one.
func (m *model) tokens(clause string, w int) []token {
	var out []token
	marked := answer.Fill(clause, func(slot string) string { return slotMark + slot + slotMark })
	for word := range strings.FieldsSeq(marked) {
		parts := strings.Split(word, slotMark)
		if len(parts) != 3 {
			out = append(out, wordToken(m.text(word)))
			continue
		}
		before, after := m.text(parts[0]), m.text(parts[2])
		value := cut(m.slotValue(scenario.Path(parts[1])), max(w-2-len(before)-len(after), 1))
		t := token{width: len(before) + len(after) + 2 + ansi.StringWidth(value)}
		if scenario.Path(parts[1]) == m.cursor {
			t.text = before + m.marked("<"+value+">") + after
		} else {
			t.text = before + "[" + m.value(value) + "]" + after
		}
		out = append(out, t)
	}
	return out
}

// slotValue is the value of an input, or a list in words.
func (m *model) slotValue(p scenario.Path) string {
	if in, ok := scenario.Find(&m.scenario, p); ok {
		return m.brief(in, shownTyped)
	}
	if l, ok := m.listOf(string(p)); ok {
		return m.text(l.Show(m.style()))
	}
	if p == answer.Further {
		return answer.FurtherWords(m.question, m.scenario)
	}
	return "?"
}

// rangeWords say what the chosen slot takes.
func (m *model) rangeWords() string {
	if in, ok := m.input(); ok {
		span := in.Range()
		if n := m.answer.Records; in.Path() == m.question.Through().Path && n > 0 {
			span = fmt.Sprintf("1 to %d", n)
			if len(in.Choices()) > 0 {
				span += ", or all"
			}
		}
		return m.text(in.Says() + ": " + span)
	}
	if l, ok := m.list(); ok {
		return m.text(l.Says() + ": Enter opens its rows")
	}
	if m.cursor == answer.Further {
		return "all else: Enter opens it"
	}
	return m.text("the finding: i says what stands behind it")
}
