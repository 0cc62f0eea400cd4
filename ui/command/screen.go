package command

import (
	"context"
	"errors"
	"os"

	"github.com/spf13/cobra"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
	"dropcrest/ui/screen"
	"dropcrest/ui/session"
	"dropcrest/ui/terminal"
)

// addScreen makes the root command open the screen, or print where there is none.
func (w world) addScreen(root *cobra.Command) {
	o := newOptions(root)
	o.question = answer.Questions()[0]
	o.from(root)
	o.substances(w)
	o.plain(root)
	root.RunE = func(cmd *cobra.Command, _ []string) error {
		s, notes, err := o.scenario(w)
		if err != nil {
			return err
		}
		if !isTerminal(w.in) || !isTerminal(w.out) || terminal.Dumb(w.env) {
			return w.ask(cmd.Context(), answer.Questions()[0], s, notes, o)
		}
		return w.openScreen(cmd.Context(), o, s)
	}
}

// openScreen shows the screen on a scenario; without --from it offers the session
// that was kept. The program's exit code is that of the signal that has ended it.
func (w world) openScreen(ctx context.Context, o *options, s scenario.Scenario) error {
	env, err := o.environment(w)
	if err != nil {
		return err
	}
	options := screen.Options{
		Scenario: s, Given: o.fromFile != "", Plain: o.isPlain, Getenv: w.env,
		Env: env, In: w.in.(*os.File), Out: w.out, Wrap: w.model,
	}
	dir, err := session.Dir(w.env)
	options.Note = err
	if err == nil {
		options.Store, options.Last, options.Found, options.Note = session.Open(dir)
		defer options.Store.Close()
	}
	err = screen.Run(ctx, options)
	var signal terminal.Signal
	if errors.As(err, &signal) {
		return exitError{code: terminal.ExitCode(signal)}
	}
	return err
}
