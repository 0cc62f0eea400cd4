package screen

import (
	"strings"

	"github.com/charmbracelet/lipgloss"

	"dropcrest/ui/figure"
)

// styles are the colours by what they stand for, of the sixteen that every
// terminal has and its owner has chosen. The background stays what it is. No
// meaning hangs on them: without colour everything is still said by text.
type styles struct {
	marked paint // the chosen slot, row, word
	value  paint // the other slots
	dim    paint // help, ranges, what is old
	strong paint // headings
	bad    paint // what is refused
	roles  [figure.LabelRole + 1]paint
}

// paint is a style as the bytes before and after a text. Lip Gloss is asked once:
// it takes two microseconds a run, and a picture has hundreds.
type paint struct{ on, off string }

func newPaint(s lipgloss.Style) paint {
	on, off, _ := strings.Cut(s.Render("x"), "x")
	return paint{on, off}
}

func (p paint) over(s string) string {
	if s == "" {
		return ""
	}
	return p.on + s + p.off
}

// newStyles returns the styles; without colour every one is left out.
func newStyles(colour bool) styles {
	if !colour {
		return styles{}
	}
	of := func(number string) lipgloss.Style { return lipgloss.NewStyle().Foreground(lipgloss.Color(number)) }
	s := styles{
		marked: newPaint(of("11").Bold(true)),
		value:  newPaint(of("14")),
		dim:    newPaint(of("7")),
		strong: newPaint(lipgloss.NewStyle().Bold(true)),
		bad:    newPaint(of("9")),
	}
	s.roles[figure.CurrentRole] = newPaint(of("11"))
	s.roles[figure.HeldRole] = newPaint(of("6"))
	s.roles[figure.OtherRole] = newPaint(of("5"))
	s.roles[figure.CrestRole] = newPaint(of("13").Bold(true))
	s.roles[figure.HazeRole] = newPaint(of("12"))
	s.roles[figure.PointRole] = newPaint(of("14").Bold(true))
	s.roles[figure.BarRole] = newPaint(of("14"))
	return s
}

// Text in a role. Without colour it comes back as it is.
func (m *model) marked(s string) string { return m.styles.marked.over(s) }
func (m *model) value(s string) string  { return m.styles.value.over(s) }
func (m *model) dim(s string) string    { return m.styles.dim.over(s) }
func (m *model) strong(s string) string { return m.styles.strong.over(s) }
func (m *model) bad(s string) string    { return m.styles.bad.over(s) }
