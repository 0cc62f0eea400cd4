package screen

import (
	"time"

	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	"dropcrest/ui/session"
)

// keepEvery is how long changes are collected before they are saved, so that a
// held key does not write a file for every step.
const keepEvery = 500 * time.Millisecond

// keeper saves the session: in the background while the program runs, and once
// more at its end.
type keeper struct {
	store    *session.Store
	waiting  bool          // a save is on its way
	touched  bool          // something has changed since the program began
	aside    bool          // a session that was not offered must be put aside first
	good     session.State // the last state that has been drawn
	hasGood  bool
	complain string // the error that was said already
}

type (
	keepNow struct{ at time.Time }
	kept    struct{ err error }
)

// keep saves the session soon.
func (m *model) keep() {
	m.keeper.touched = true
	if m.keeper.aside || m.offered != nil {
		m.decline()
	}
	if m.keeper.waiting || !m.keeper.store.Owned() {
		return
	}
	m.keeper.waiting = true
	m.do(tea.Tick(keepEvery, func(t time.Time) tea.Msg { return keepNow{t} }))
}

// save writes the session outside of Update: a slow disk must not stop the keys.
func (m *model) save(at time.Time) {
	m.keeper.waiting = false
	state, store := m.state(at), m.keeper.store
	m.do(safely(func() tea.Msg { return kept{store.Save(state)} }))
}

// saved says an error of saving, the same one only once.
func (m *model) saved(err error) {
	if err == nil {
		m.keeper.complain = ""
		return
	}
	if text := err.Error(); text != m.keeper.complain {
		m.keeper.complain = text
		m.say(text)
	}
}

// state is what a session keeps. Neither scenarios nor lists of changes are ever
// changed in place once they are in the model, so that they can be shared with
// whoever writes them.
func (m *model) state(at time.Time) session.State {
	s := session.State{
		Page: m.question.Key, Cursor: m.cursor, Scenario: m.scenario, History: m.history, Saved: at,
	}
	for _, q := range m.questions {
		held := m.leaves[q.Key].held
		if q.Key == m.question.Key {
			held = m.held
		}
		for _, h := range held {
			s.Held = append(s.Held, session.Held{Page: q.Key, Letter: h.letter, Scenario: h.scenario})
		}
		s.Held = append(s.Held, m.waiting[q.Key]...)
	}
	return s
}

// last saves the session at the end: the state on the screen, or after a fault
// the last one that could be drawn. A session that is still on offer stays.
func (m *model) last(fault bool, at time.Time) error {
	if m.offered != nil || !m.keeper.touched {
		return nil
	}
	state := m.keeper.good
	if !fault || !m.keeper.hasGood {
		state = m.state(at)
	}
	state.Saved = at
	return m.keeper.store.Save(state)
}

// resume takes up the session that was offered.
func (m *model) resume() {
	s := *m.offered
	m.offered = nil
	for _, q := range m.questions {
		if q.Key == s.Page {
			m.question = q
		}
	}
	m.stopWork()
	m.scenario, m.history = s.Scenario.Clone(), s.History
	m.leaf, m.leaves, m.waiting = newLeaf(), map[string]leaf{}, map[string][]session.Held{}
	m.cursor, m.answer = s.Cursor, answer.Answer{}
	for _, h := range s.Held {
		if h.Page == "" {
			h.Page = m.question.Key
		}
		m.waiting[h.Page] = append(m.waiting[h.Page], h)
	}
	m.answerFirst()
	m.holdAgain()
	m.settle(0)
	m.keeper.touched = true
	m.redraw()
	m.say("")
}

// decline puts the session that was offered aside.
func (m *model) decline() {
	m.offered, m.keeper.aside = nil, false
	if err := m.keeper.store.Decline(); err != nil {
		m.say(err.Error())
	}
}

// greet says what must be known at the start: another owner, trouble with the
// session, a session to go on with.
func (m *model) greet(o Options) {
	switch {
	case o.Store != nil && !o.Store.Owned() && o.Note == nil:
		m.say("another dropcrest owns the session; this one will not be saved")
	case o.Note != nil:
		m.say(o.Note.Error())
	}
	m.keeper.aside = o.Found && o.Given
	if !o.Found || o.Given || !o.Store.Owned() {
		return
	}
	last := o.Last
	m.offered = &last
	when := "last time"
	if !last.Saved.IsZero() {
		when = last.Saved.Local().Format("2 January 15:04")
	}
	m.offer = "Enter: go on with the session of " + when + ". Esc: leave it"
}
