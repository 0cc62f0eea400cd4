package screen

import (
	"fmt"
	"slices"
	"strings"
	"time"

	"github.com/charmbracelet/x/ansi"
)

// The least window in which the page can be used, and the height from which on
// there is room for blank lines, held curves and the whole finding.
const (
	leastWidth  = 60
	leastHeight = 18
	roomyHeight = 22
	airyHeight  = 30 // blank lines around the finding too
)

// View is the screen. It only lays out; what is expensive was done by Update or
// is kept from the last look.
func (m *model) View() string {
	if m.width < 1 || m.height < 1 {
		return ""
	}
	lines := m.page()
	lines = fit(lines, m.width, m.height)
	m.keeper.good, m.keeper.hasGood = m.state(time.Time{}), true
	return strings.Join(lines, "\n")
}

// tooSmall reports whether the window is too small for a page.
func (m *model) tooSmall() bool { return m.width < leastWidth || m.height < leastHeight }

// page is the whole screen in lines: header and statement, then picture and
// finding or what lies over them, then range and help.
func (m *model) page() []string {
	if m.tooSmall() {
		says := fmt.Sprintf("dropcrest needs a %dx%d window", leastWidth, leastHeight)
		if ansi.StringWidth(says) > m.width {
			says = fmt.Sprintf("needs %dx%d", leastWidth, leastHeight)
		}
		return []string{says}
	}
	head := []string{m.header()}
	if m.roomy() {
		head = append(head, "")
	}
	head = append(head, m.statement(m.width)...)
	if m.roomy() {
		head = append(head, "")
	}
	room := max(m.height-len(head)-1, 0)
	return append(append(head, m.body(room)...), m.help())
}

func (m *model) roomy() bool { return m.height >= roomyHeight }
func (m *model) airy() bool  { return m.height >= airyHeight }

// header names the pages, the open one in capitals: in any case there is one.
func (m *model) header() string {
	var titles []string
	for _, q := range m.questions {
		title := m.text(q.Title)
		if q.Key == m.question.Key {
			title = m.strong(strings.ToUpper(title))
		}
		titles = append(titles, title)
	}
	line := " " + strings.Join(titles, "   ")
	if m.keeper.store == nil || m.keeper.store.Owned() {
		return line
	}
	const says = "this session is not saved"
	if gap := m.width - ansi.StringWidth(line) - len(says) - 1; gap > 1 {
		line += strings.Repeat(" ", gap) + m.dim(says)
	}
	return line
}

// body is all between statement and help line in exactly h lines: picture, finding
// and held curves, then range and message. A panel lies over them; one of few
// lines, such as an entry, leaves most of them in sight, and one in which the
// answer changes leaves the picture what room there is.
func (m *model) body(h int) []string {
	if m.panel == nil {
		return append(m.under(h-1), m.rangeLine())
	}
	free := h // the last line stays for a message
	if m.message != "" || m.work.shown {
		free--
	}
	over := fit(slices.Clone(m.panel.lines(m.width, free, m)), m.width, free)
	_, sharing := m.panel.(sharingPanel)
	if left := free - leastRows - 2; sharing && len(over) > left && left >= leastShared {
		over = fit(slices.Clone(m.panel.lines(m.width, left, m)), m.width, left)
	}
	above := free - len(over)
	var lines []string
	switch {
	case len(over) <= smallPanel:
		lines = append(padTo(m.under(h-1), above), over...)
	case sharing && above > leastRows+1:
		lines = append(padTo(slices.Clone(m.picture(m.width, above)), above), over...)
	default:
		lines = padTo(over, free)
	}
	return append(lines, m.rangeLine())[:h]
}

// smallPanel is the number of lines up to which a panel leaves the picture as it
// is and lies over its foot.
const smallPanel = 4

// leastShared is the number of lines with which a panel that scrolls is content,
// so that the picture stays in sight.
const leastShared = 6

// under is picture, finding and held curves in h lines.
func (m *model) under(h int) []string {
	foot := m.finding(m.width, max(h-leastPicture, leastFinding))
	if m.roomy() {
		if line := m.heldLine(min(m.width, textWidth) - 2); line != "" {
			foot = append(foot, " "+line)
		}
	}
	if m.airy() {
		foot = append(append([]string{""}, foot...), "")
	}
	foot = foot[:min(len(foot), h)]
	lines := slices.Clone(m.picture(m.width, h-len(foot)))
	return append(padTo(lines, h-len(foot)), foot...)
}

func padTo(lines []string, h int) []string {
	for len(lines) < h {
		lines = append(lines, "")
	}
	return lines[:h]
}

// leastFinding is the number of lines that the finding always has on a roomy
// screen: the picture must not change its height with every word.
const leastFinding = 3

// leastPicture is the number of lines that the picture has on a roomy screen, its
// title included, whatever there is to say.
const leastPicture = 8

// finding is the answer in words in lines of at most w columns. When the cursor
// is on it, it stands in <>. Sentences that do not fit into most lines are left to
// i; the first one always stands.
func (m *model) finding(w, most int) []string {
	n := len(m.answer.Finding)
	lines := m.findingOf(n, w)
	for n > 1 && len(lines) > most {
		n--
		lines = m.findingOf(n, w)
	}
	return lines
}

// findingOf is the finding with its first n sentences.
func (m *model) findingOf(n, w int) []string {
	sentences := m.answer.Finding[:n]
	if m.unsolved != "" {
		sentences = []string{"There is no answer: " + m.unsolved}
	}
	if !m.roomy() {
		sentences = sentences[:min(len(sentences), 1)]
	}
	if says := m.moreToSay(n); says != "" && m.roomy() && m.unsolved == "" {
		sentences = append(slices.Clone(sentences), "("+says+": End, i)")
	}
	text := m.text(strings.Join(sentences, " "))
	if m.work.old {
		text = "(of the question before) " + text
	}
	lines := indented(wrap(text, min(w, textWidth)-3))
	if m.onFinding() && len(lines) > 0 {
		lines[0] = m.marked("<") + lines[0][1:]
		lines[len(lines)-1] += m.marked(">")
	}
	if m.roomy() && len(lines) < leastFinding {
		lines = padTo(lines, leastFinding)
	}
	return lines
}

// moreToSay names what the finding leaves to i when it has n sentences.
func (m *model) moreToSay(n int) string {
	switch notes := m.unsaid(); {
	case n < len(m.answer.Finding):
		return "more"
	case notes > 1:
		return fmt.Sprintf("%d more notes", notes)
	case notes == 1:
		return "1 more note"
	}
	return ""
}

// unsaid is the number of notes that the finding leaves to i.
func (m *model) unsaid() int {
	n := 0
	for _, note := range m.answer.Notes {
		if !slices.Contains(m.answer.Finding, note.Text) {
			n++
		}
	}
	return n
}

// rangeLine says what the chosen slot takes and, at its right, the message of
// the last key; a long message takes the whole line.
func (m *model) rangeLine() string {
	w := min(m.width, textWidth) - 2
	message := m.text(m.message)
	if message == "" && m.panel == nil {
		message = m.recordWords()
	}
	if working := m.work.words(); working != "" {
		message = working
	}
	if m.message == "" && m.offered != nil && m.panel == nil {
		message = m.text(m.offer)
	}
	says := m.rangeWords()
	if m.panel != nil {
		says = ""
	}
	gap := w - ansi.StringWidth(says) - ansi.StringWidth(message)
	switch {
	case message == "":
		return " " + m.dim(cut(says, w))
	case says == "" || gap < 3:
		return " " + cut(message, w)
	}
	return " " + m.dim(says) + strings.Repeat(" ", gap) + message
}

// help is the help line: the keys of what is open.
func (m *model) help() string {
	bindings := m.keys.short()
	if m.panel != nil {
		bindings = m.panel.keys(m.keys)
	}
	return " " + m.dim(helpLine(bindings, min(m.width, textWidth)-2))
}
