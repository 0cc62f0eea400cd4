package screen

import (
	"context"
	"errors"
	"fmt"
	"runtime/debug"
	"strings"
	"sync/atomic"
	"time"

	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// showAfter is how long work may take before it is spoken of, lookEvery how
// often its progress is shown then: every look costs bytes.
const (
	showAfter = 300 * time.Millisecond
	lookEvery = 250 * time.Millisecond
)

// work is a question that takes longer than a frame while it is answered. The
// last answer stays, marked as old.
type work struct {
	revision int                // of the work that counts; results of earlier work are dropped
	cancel   context.CancelFunc // nil: nothing is being worked out
	done     *atomic.Int64      // per mille
	shown    bool
	percent  int
	old      bool // the answer belongs to an earlier scenario
	halted   bool // the person has stopped it: what there is may still come
}

type (
	answered struct {
		revision int
		answer   answer.Answer
		err      error
	}
	lookAtWork struct{ revision int }
)

// ask answers the question for a scenario at once.
func (m *model) ask(s scenario.Scenario) (answer.Answer, error) {
	return m.question.Ask(context.Background(), m.env, s)
}

// begin works out the answer beside the keys, instead of what was worked out so
// far.
func (m *model) begin() {
	m.stopWork()
	ctx, cancel := context.WithCancel(context.Background())
	m.work.revision++
	revision, done := m.work.revision, new(atomic.Int64)
	m.work.cancel, m.work.done, m.work.old = cancel, done, len(m.answer.Finding) > 0
	m.keys.Stop.SetEnabled(true)
	env, ask, s := m.env, m.question.Ask, m.scenario.Clone()
	env.Progress = func(n, total int64) {
		if total > 0 {
			done.Store(1000 * n / total)
		}
	}
	m.do(safely(func() tea.Msg {
		a, err := ask(ctx, env, s)
		return answered{revision, a, err}
	}))
	m.do(tea.Tick(showAfter, func(time.Time) tea.Msg { return lookAtWork{revision} }))
}

// stopWork ends the work; its answer will not count.
func (m *model) stopWork() {
	m.work.halted = false
	if m.work.cancel == nil {
		return
	}
	m.work.cancel()
	m.work = work{revision: m.work.revision, old: m.work.old}
	m.keys.Stop.SetEnabled(false)
}

// halt ends the work as a person asks for it: a question that has something to
// say by then still says it.
func (m *model) halt() {
	m.stopWork()
	m.work.halted = true
	if m.work.old {
		m.say("stopped; the answer is of the question before")
	} else {
		m.say("stopped before there was an answer")
	}
}

// look shows how far the work is.
func (m *model) look(l lookAtWork) {
	if m.work.cancel == nil || l.revision != m.work.revision {
		return
	}
	m.work.shown = true
	m.work.percent = int(m.work.done.Load() / 10)
	m.do(tea.Tick(lookEvery, func(time.Time) tea.Msg { return l }))
}

// arrived takes the answer of the work that counts, or as much as there is of one
// that was stopped.
func (m *model) arrived(a answered) {
	if a.revision != m.work.revision {
		return
	}
	if m.work.halted && errors.Is(a.err, context.Canceled) && len(a.answer.Finding) > 0 {
		m.work.old, m.work.halted = false, false
		m.accept(a.answer)
		m.say("stopped; this is what there is so far")
		return
	}
	if m.work.cancel == nil {
		return
	}
	m.stopWork()
	if a.err != nil {
		m.say("no answer: " + a.err.Error() + " (u takes the change back)")
		return
	}
	m.work.old = false
	m.accept(a.answer)
}

// words are percent and a bar, nothing before the work is spoken of.
func (w work) words() string {
	if !w.shown {
		return ""
	}
	full := min(max(w.percent/10, 0), 10)
	return fmt.Sprintf("working %3d %% [%s%s] Esc stops it", w.percent, strings.Repeat("#", full), strings.Repeat(".", 10-full))
}

// fault is a panic of a command, which must end the program as one in Update
// does: with the terminal given back.
type fault struct {
	what  any
	stack []byte
}

func (f fault) Error() string { return fmt.Sprintf("panic: %v\n\n%s", f.what, f.stack) }

// safely runs a command; a panic in it becomes a message. Bubble Tea would print
// it into the screen that is about to vanish.
func safely(c tea.Cmd) tea.Cmd {
	return func() (msg tea.Msg) {
		defer func() {
			if what := recover(); what != nil {
				msg = fault{what, debug.Stack()}
			}
		}()
		return c()
	}
}
