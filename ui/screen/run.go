package screen

import (
	"context"
	"errors"
	"io"
	"os"
	"time"

	tea "github.com/charmbracelet/bubbletea"

	"dropcrest/ui/answer"
	_ "dropcrest/ui/dark" // nobody asks the terminal for its background
	"dropcrest/ui/scenario"
	"dropcrest/ui/session"
	"dropcrest/ui/terminal"
)

// Options say what the screen starts with.
type Options struct {
	Scenario scenario.Scenario
	Given    bool // the scenario comes from a file: no session is offered
	Env      answer.Env
	Plain    bool                // ASCII whatever the locale says
	Getenv   func(string) string // nil: the environment of the process

	In  *os.File
	Out io.Writer

	Store *session.Store // nil: nothing is kept
	Last  session.State  // what Store.Open has found
	Found bool
	Note  error // what Store.Open had to say

	Wrap func(tea.Model) tea.Model // nil: the model as it is; for tests
}

func (o Options) env(name string) string {
	if o.Getenv == nil {
		return os.Getenv(name)
	}
	return o.Getenv(name)
}

func utf8Locale(o Options) bool { return terminal.UTF8(o.env) }
func coloured(o Options) bool   { return !terminal.NoColor(o.env) }

// framesPerSecond bounds what a held key sends down a slow line.
const framesPerSecond = 30

// lineDropped is how long to wait for the signal that says why the input ended.
const lineDropped = 200 * time.Millisecond

// Run shows the screen until it is left and saves the session, however that
// happens. The error is nil when the person has left it, the cause of the context
// (a terminal.Signal) when a signal has ended it.
func Run(parent context.Context, o Options) error {
	ctx, stop := terminal.Context(parent)
	defer stop()
	m := newModel(o)
	var root tea.Model = m
	if o.Wrap != nil {
		root = o.Wrap(m)
	}
	program := tea.NewProgram(root,
		tea.WithContext(ctx), tea.WithoutSignalHandler(), tea.WithAltScreen(), tea.WithFPS(framesPerSecond),
		tea.WithInput(terminal.NewInput(o.In)), tea.WithOutput(o.Out))
	_, err := program.Run()
	m.stopWork()
	fault := errors.Is(err, tea.ErrProgramPanic) || m.fatal != nil
	saving := m.last(fault, time.Now())
	switch {
	case fault:
		return errors.Join(err, m.fatal, saving)
	case err != nil:
		return errors.Join(cause(ctx, err), saving)
	}
	return saving
}

// cause is why the program has ended with err: the signal, if there was one. A
// line that drops ends the input a moment before the signal arrives.
func cause(ctx context.Context, err error) error {
	select {
	case <-ctx.Done():
		return context.Cause(ctx)
	case <-time.After(lineDropped):
		return err
	}
}
