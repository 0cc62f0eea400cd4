package screen

import (
	"fmt"
	"strings"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// set gives the input at p the value of a text. A value that is refused, or that
// leaves the question without an answer, changes nothing.
func (m *model) set(p scenario.Path, text string) error {
	return m.change(p, false, func(s *scenario.Scenario) error {
		in, err := find(s, p)
		if err != nil {
			return err
		}
		return in.Set(text)
	})
}

// step moves the input at p by its natural step, or by a big one; dir > 0 is
// upwards. A run of steps on one input is one entry of the undo list.
func (m *model) step(p scenario.Path, dir int, big bool) error {
	return m.change(p, true, func(s *scenario.Scenario) error {
		in, err := find(s, p)
		if err != nil {
			return err
		}
		return in.Step(dir, big)
	})
}

// edit makes any other change; p names what is changed, "" for several inputs.
func (m *model) edit(p scenario.Path, f func(*scenario.Scenario) error) error {
	return m.change(p, false, f)
}

func find(s *scenario.Scenario, p scenario.Path) (scenario.Input, error) {
	in, ok := scenario.Find(s, p)
	if !ok {
		return nil, fmt.Errorf("there is no input %s any more", p)
	}
	return in, nil
}

// change makes a change on a copy and, if the question can be answered then,
// takes the copy over with an entry of the undo list.
func (m *model) change(p scenario.Path, step bool, f func(*scenario.Scenario) error) error {
	next := m.scenario.Clone()
	if err := f(&next); err != nil {
		return err
	}
	if next.Equal(m.scenario) {
		return nil
	}
	if m.question.Follow != nil {
		m.question.Follow(&next, p)
	}
	if errs := scenario.Check(&next); len(errs) > 0 {
		return errs[0]
	}
	before := m.scenario
	if err := m.take(next, m.unsolved != ""); err != nil {
		return lackOf(err, next, f)
	}
	m.history.Add(p, before, next, step)
	m.say(m.whatChanged(before, next))
	return nil
}

// whatChanged says what a run of steps has changed so far, or a single change.
func (m *model) whatChanged(before, now scenario.Scenario) string {
	if n := len(m.history.Past); n > 0 && m.history.Past[n-1].After.Equal(now) {
		return m.history.Past[n-1].Says
	}
	return strings.Join(scenario.Changes(before, now), ", ")
}

// take makes next the scenario, with its answer if that is there within a frame,
// else with work that will bring it. After an error nothing has changed. A
// scenario without an answer is taken only with anyway: when there is no answer
// now, so that it can be put right in several steps, and when it was there before.
func (m *model) take(next scenario.Scenario, anyway bool) error {
	next.Use(m.env.Substances)
	if !m.question.IsLive(next) {
		m.scenario = next
		m.begin()
		m.changed()
		return nil
	}
	a, err := m.ask(next)
	if err != nil && !anyway {
		return err
	}
	m.stopWork()
	m.scenario, m.work.old = next, false
	m.accept(a)
	if err != nil {
		m.unsolved = err.Error()
	}
	m.changed()
	return nil
}

// accept makes a the answer of the scenario.
func (m *model) accept(a answer.Answer) {
	m.answer, m.unsolved = a, ""
	m.offerKeys()
	m.redraw()
}

// changed is what follows from every change that a session keeps.
func (m *model) changed() {
	m.redraw()
	m.settle(m.place())
	m.keep()
}

// answerFirst answers the question at the start. There is nothing to fall back
// to: a scenario without an answer is shown with the reason.
func (m *model) answerFirst() {
	m.scenario.Use(m.env.Substances) // that of a session knows none of the user's
	m.offerKeys()
	m.redraw()
	if !m.question.IsLive(m.scenario) {
		m.begin()
		return
	}
	a, err := m.ask(m.scenario)
	m.accept(a)
	if err != nil {
		m.unsolved = err.Error()
	}
}

// undo takes the last change back, redo does it again.
func (m *model) undo() { m.travel("undone", "nothing to undo", m.history.Undo, before) }
func (m *model) redo() { m.travel("redone", "nothing to redo", m.history.Redo, after) }

func before(e scenario.Entry) scenario.Scenario { return e.Before }
func after(e scenario.Entry) scenario.Scenario  { return e.After }

func (m *model) travel(did, nothing string, move func() (scenario.Entry, bool), to func(scenario.Entry) scenario.Scenario) {
	e, ok := move()
	if !ok {
		m.say(nothing)
		return
	}
	_ = m.take(to(e).Clone(), true) // it was there before, with an answer or without
	if e.Path != "" {
		m.jump(e.Path)
	}
	m.say(did + ": " + e.Says)
}
