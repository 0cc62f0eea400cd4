package command

import (
	"errors"

	"github.com/spf13/cobra"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
	"dropcrest/ui/terminal"
)

// addScreen makes the root command open the screen, or print where there is none.
func (w world) addScreen(root *cobra.Command) {
	o := newOptions(root)
	o.from(root)
	o.plain(root)
	root.RunE = func(cmd *cobra.Command, _ []string) error {
		s, notes, err := o.scenario(w)
		if err != nil {
			return err
		}
		if !isTerminal(w.in) || !isTerminal(w.out) || terminal.Dumb(w.env) {
			return w.ask(cmd.Context(), answer.Questions()[0], s, notes, o)
		}
		return openScreen(cmd, w, o, s)
	}
}

// openScreen starts the screen on a scenario; without --from it goes on with the
// session.
func openScreen(_ *cobra.Command, _ world, _ *options, _ scenario.Scenario) error {
	return errors.New("the screen is not part of this build: dropcrest curve prints the answer")
}
