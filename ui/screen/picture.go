package screen

import (
	"fmt"
	"slices"
	"strings"
	"unicode/utf8"

	"dropcrest/ui/figure"
)

// drawing is the picture as it was drawn last. Bubble Tea looks at the screen
// after every message; the picture is drawn only when it has changed.
type drawing struct {
	w, h  int
	lines []string
}

// redraw makes the next look draw the picture anew.
func (m *model) redraw() { m.drawn = drawing{} }

// picture is the figure of the answer in h lines of w columns, its title first.
// Where there is no room for a picture its marked points are given in words.
func (m *model) picture(w, h int) []string {
	if m.drawn.lines != nil && m.drawn.w == w && m.drawn.h == h {
		return m.drawn.lines
	}
	m.drawn = drawing{w, h, m.draw(w, h)}
	return m.drawn.lines
}

// leastRows is the height below which a picture says less than words.
const leastRows = 6

func (m *model) draw(w, h int) []string {
	if len(m.answer.Figures) == 0 || h < 1 {
		return []string{}
	}
	f := m.figure()
	if h < leastRows+1 {
		lines := []string{}
		for _, says := range figure.Words(f) {
			lines = append(lines, " "+cut(m.text(says), w-1))
		}
		return lines[:min(len(lines), h)]
	}
	frame, _ := m.question.FrameOf(m.scenario, f, m.frames[f.Key], h-1)
	m.frames[f.Key] = frame
	lines := []string{m.title(f, w)}
	for _, row := range figure.Text(f, frame, w-1, h-1, figure.Style{ASCII: m.ascii}) {
		lines = append(lines, m.row(row))
	}
	return lines
}

// figure is the figure that is shown with the held curves and the other lines.
func (m *model) figure() figure.Figure {
	at := m.shownFigure()
	f := m.answer.Figures[at]
	f.Lines, f.Marks = slices.Clone(f.Lines), slices.Clone(f.Marks)
	for _, h := range m.held {
		if part, ok := h.parts[f.Key]; ok {
			f.Lines = append(f.Lines, part.line)
			f.Marks = append(f.Marks, part.marks...)
		}
	}
	if at == 0 { // the others belong to the first figure
		f.Lines = append(f.Lines, m.shownOthers()...)
	}
	return f
}

// title names both axes and, at the right, what the glyphs of marks and points
// stand for, and which picture this is of several.
func (m *model) title(f figure.Figure, w int) string {
	title := " " + m.text(f.Title)
	legend := ""
	for _, k := range f.Marks {
		if k.Kind == figure.CrestMark {
			legend = m.text("◆ crest")
		}
	}
	if slices.ContainsFunc(f.Points, func(p figure.Point) bool { return p.Letter == 0 }) {
		legend = m.text("■ measured")
	}
	if n := len(m.answer.Figures); n > 1 {
		legend = strings.TrimSpace(fmt.Sprintf("%s  %d/%d", legend, m.shownFigure()+1, n))
	}
	gap := w - 2 - utf8.RuneCountInString(title) - utf8.RuneCountInString(legend)
	if legend == "" || gap < 2 {
		return cut(title, w)
	}
	return title + strings.Repeat(" ", gap) + legend
}

// row is one row of cells as text. Neighbours of one role share their colour, and
// blanks between them too: every change of colour costs bytes.
func (m *model) row(cells []figure.Cell) string {
	var b, run strings.Builder
	role := figure.Blank
	blanks := 0
	end := func() {
		b.WriteString(m.styles.roles[role].over(run.String()))
		run.Reset()
	}
	for _, c := range cells {
		if c.Rune == ' ' {
			blanks++
			continue
		}
		if run.Len() > 0 && c.Role != role && m.styles.roles[c.Role] != m.styles.roles[role] {
			end()
		}
		if run.Len() == 0 {
			role = c.Role
			b.WriteString(strings.Repeat(" ", blanks))
		} else {
			run.WriteString(strings.Repeat(" ", blanks))
		}
		blanks = 0
		run.WriteRune(c.Rune)
	}
	end()
	return b.String()
}
