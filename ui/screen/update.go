package screen

import (
	"errors"

	"github.com/charmbracelet/bubbles/key"
	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// report is what a command of a panel brings back: it is called within Update.
type report func(m *model)

// Update takes one message: the window, keys, then what work has brought.
func (m *model) Update(msg tea.Msg) (tea.Model, tea.Cmd) {
	switch msg := msg.(type) {
	case tea.WindowSizeMsg:
		m.width, m.height = msg.Width, msg.Height
	case tea.KeyMsg:
		m.press(msg)
	case answered:
		m.arrived(msg)
	case lookAtWork:
		m.look(msg)
	case keepNow:
		m.save(msg.at)
	case kept:
		m.saved(msg.err)
	case report:
		msg(m)
	case fault:
		m.fatal = msg
		m.do(tea.Quit)
	}
	return m, m.flush()
}

// press takes a key. Esc and another key within a moment arrive as one key with
// Alt: they are two.
func (m *model) press(k tea.KeyMsg) {
	if k.Alt && k.Type != tea.KeyEsc {
		k.Alt = false
		m.press(tea.KeyMsg{Type: tea.KeyEsc})
	}
	k.Alt = false
	if repeated(k) {
		for range k.Runes {
			m.press(tea.KeyMsg{Type: tea.KeyRunes, Runes: k.Runes[:1]})
		}
		return
	}
	switch {
	case k.Type == tea.KeyCtrlC, m.tooSmall() && m.panel == nil && key.Matches(k, m.keys.Quit):
		m.stopWork()
		m.do(tea.Quit)
	case m.tooSmall():
		// Nobody sees what a key would do.
	case m.panel != nil:
		m.message = ""
		next, cmd := m.panel.press(k, m)
		m.panel = next
		if cmd != nil {
			m.do(safely(cmd))
		}
	case k.Paste:
		m.paste(k)
	case len(k.Runes) > 1:
		m.pressBurst(k)
	default:
		m.pressPage(k)
	}
}

// repeated reports whether a key is one key that a slow line has delivered several
// times at once.
func repeated(k tea.KeyMsg) bool {
	if k.Paste || len(k.Runes) < 2 {
		return false
	}
	for _, r := range k.Runes {
		if r != k.Runes[0] {
			return false
		}
	}
	return true
}

// pressBurst takes characters that have arrived at once: a number typed on a slow
// line. Any others are the pieces of a broken key, or text pasted on a terminal
// that does not say so, and mean nothing.
func (m *model) pressBurst(k tea.KeyMsg) {
	first := tea.KeyMsg{Type: tea.KeyRunes, Runes: k.Runes[:1]}
	if !key.Matches(first, m.keys.Type) {
		return
	}
	m.press(first)
	if m.panel != nil {
		m.press(tea.KeyMsg{Type: tea.KeyRunes, Runes: k.Runes[1:]})
	}
}

// pressPage takes a key while no panel is open. A session on offer is taken up by
// Enter and put aside by Esc, or by the first change; keys that only look leave
// it on offer.
func (m *model) pressPage(k tea.KeyMsg) {
	switch {
	case m.offered == nil:
	case key.Matches(k, m.keys.Open):
		m.resume()
		return
	case k.Type == tea.KeyEsc:
		m.message = ""
		m.decline()
		return
	}
	said := m.message
	m.message = ""
	if !m.pressSlot(k) && !m.pressOther(k) {
		m.message = said // a key that means nothing changes nothing on the screen
	}
}

// pressSlot takes the keys that choose and change a slot.
func (m *model) pressSlot(k tea.KeyMsg) bool {
	switch {
	case key.Matches(k, m.keys.Left):
		m.move(-1)
	case key.Matches(k, m.keys.Right):
		m.move(1)
	case key.Matches(k, m.keys.First):
		m.move(-len(m.slots()))
	case key.Matches(k, m.keys.Last):
		m.move(len(m.slots()))
	case key.Matches(k, m.keys.Up):
		m.stepSlot(1, false)
	case key.Matches(k, m.keys.Down):
		m.stepSlot(-1, false)
	case key.Matches(k, m.keys.BigUp):
		m.stepSlot(1, true)
	case key.Matches(k, m.keys.BigDown):
		m.stepSlot(-1, true)
	case key.Matches(k, m.keys.Type):
		m.startEntry(k.Runes[0])
	case key.Matches(k, m.keys.Open):
		m.open()
	default:
		return false
	}
	return true
}

// pressOther takes the keys that mean the same on every slot.
func (m *model) pressOther(k tea.KeyMsg) bool {
	switch {
	case key.Matches(k, m.keys.NextPage):
		m.turn(1)
	case key.Matches(k, m.keys.PageBefore):
		m.turn(-1)
	case key.Matches(k, m.keys.Picture):
		m.nextPicture()
	case key.Matches(k, m.keys.NextRecord):
		m.goToRecord(1)
	case key.Matches(k, m.keys.RecordBefore):
		m.goToRecord(-1)
	case key.Matches(k, m.keys.Hold):
		m.hold()
	case key.Matches(k, m.keys.Release):
		m.release()
	case key.Matches(k, m.keys.Others):
		m.cycleOthers()
	case key.Matches(k, m.keys.Ledger):
		m.turnToLedger()
	case key.Matches(k, m.keys.Table):
		m.panel = newTable(m)
	case key.Matches(k, m.keys.Write):
		m.panel = newWrite(m)
	case key.Matches(k, m.keys.About):
		m.panel = newAbout(m)
	case key.Matches(k, m.keys.Help):
		m.panel = newHelp(m)
	case key.Matches(k, m.keys.Undo):
		m.undo()
	case key.Matches(k, m.keys.Redo):
		m.redo()
	case key.Matches(k, m.keys.Stop):
		m.halt()
	case key.Matches(k, m.keys.Quit):
		m.stopWork()
		m.do(tea.Quit)
	default:
		return false
	}
	return true
}

// stepSlot changes the chosen slot by a step.
func (m *model) stepSlot(dir int, big bool) {
	in, ok := m.input()
	if !ok {
		return // the line of ranges says what Enter does here
	}
	err := m.step(in.Path(), dir, big)
	if e := m.lacking(err, nil); e != nil {
		m.panel = e
		return
	}
	if err != nil {
		m.say(stopped(err))
	}
}

// stopped says why a step leads nowhere: at the end of a range, which the line of
// ranges gives, that is no error.
func stopped(err error) string {
	var value *scenario.ValueError
	if errors.As(err, &value) {
		return value.Problem
	}
	return refusal(err)
}

// paste opens an entry with text pasted on a slot that takes text, or with a
// number on a slot for one. Other text would drive the page.
func (m *model) paste(k tea.KeyMsg) {
	if in, ok := m.input(); ok {
		if e := m.begun(in, k, nil); e != nil {
			m.panel = e
			return
		}
	}
	m.say(notPasted)
}

const notPasted = "pasted text is taken by an entry, or when it is a number on a slot for one"

// startEntry starts an entry with the first character typed.
func (m *model) startEntry(first rune) {
	in, ok := m.input()
	if !ok || !isNumeric(in) {
		m.say("this is no number: Enter opens it")
		return
	}
	m.panel = newEntry(in, first, "")
}

// isNumeric reports whether an input takes what digits begin.
func isNumeric(in scenario.Input) bool {
	return in.Kind() == scenario.Number || in.Kind() == scenario.Numbers
}

// open opens what lies behind the chosen slot.
func (m *model) open() {
	if l, ok := m.list(); ok {
		m.panel = newRows(l)
		return
	}
	if m.cursor == answer.Further {
		m.panel = newSettings(m)
		return
	}
	in, ok := m.input()
	switch {
	case !ok:
		m.panel = newAbout(m)
	case in.Kind() == scenario.Switch:
		m.stepSlot(1, false)
	case m.left[in.Path()] != "" || len(in.Choices()) == 0:
		m.panel = newEntry(in, 0, m.left[in.Path()])
	default:
		m.panel = newList(in)
	}
}
