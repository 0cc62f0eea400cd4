package command

import (
	"bytes"
	"context"
	"errors"
	"fmt"

	"github.com/spf13/cobra"

	"dropcrest/atmos"
	"dropcrest/ui/answer"
	"dropcrest/ui/form"
	"dropcrest/ui/scenario"
	"dropcrest/ui/terminal"
)

// newQuestion makes the command of one question.
func (w world) newQuestion(q answer.Question) *cobra.Command {
	cmd := &cobra.Command{
		Use:     q.Key,
		Short:   "Answer: " + q.Says,
		Long:    questionHelp(q),
		Example: examples()[q.Key],
		Args:    noArguments,
	}
	o := newOptions(cmd)
	o.inputs(cmd, q)
	o.from(cmd)
	o.substances(w)
	o.form(cmd, form.Formats()...)
	o.plain(cmd)
	cmd.RunE = func(cmd *cobra.Command, _ []string) error {
		s, notes, err := o.scenario(w)
		if err != nil {
			return err
		}
		return w.ask(cmd.Context(), q, s, notes, o)
	}
	return cmd
}

func questionHelp(q answer.Question) string {
	return q.Says + "\n\nValues are written with their unit, such as 100nm, 20C, 293.15K, 72mN/m, 95%. " +
		"Humidity and supersaturation are in per cent everywhere, also in CSV and JSON; all else is in SI units there."
}

// examples are one command line for each command.
func examples() map[string]string {
	return map[string]string{
		"curve":      "dropcrest curve --dry-diameter 50nm --component \"sodium chloride\"",
		"substances": "dropcrest substances \"ammonium sulfate\"",
		"verify":     "dropcrest verify --as csv --out verify.csv",
	}
}

// ask answers a question and writes the answer in the form that was asked for.
func (w world) ask(ctx context.Context, q answer.Question, s scenario.Scenario, notes []atmos.Note, o *options) error {
	as := o.as
	if as == "" {
		as = "text"
	}
	if err := w.refuseBinary(as, o.out); err != nil {
		return err
	}
	env, err := o.environment()
	if err != nil {
		return err
	}
	a, err := q.Ask(ctx, env, s)
	if err != nil {
		return questionError(err)
	}
	a.Notes = append(notes, a.Notes...)
	for i := range a.Figures {
		for _, n := range notes {
			a.Figures[i].Notes = append(a.Figures[i].Notes, n.Text)
		}
	}
	var b bytes.Buffer
	sheet := form.Sheet{Question: q, Scenario: s, Answer: a, Version: version(),
		Width: w.width(), ASCII: o.isPlain || !terminal.UTF8(w.env)}
	if err := sheet.Write(&b, as); err != nil {
		return err
	}
	if !form.TellsNotes(as) {
		for _, n := range a.Notes {
			w.complain("note", n.Text)
		}
	}
	return w.deliver(o.out, b.Bytes())
}

// questionError names the option that an error of the question belongs to.
func questionError(err error) error {
	var in *answer.InputError
	if errors.As(err, &in) && in.Input != "" {
		return fmt.Errorf("--%s: %w", in.Input, err)
	}
	return err
}

// refuseBinary keeps pictures that are not text off the terminal.
func (w world) refuseBinary(as, out string) error {
	if as != "png" && as != "pdf" || out != "" && out != "-" || !isTerminal(w.out) {
		return nil
	}
	return misused("--as %s writes a binary file, which a terminal cannot show: add --out FILE.%s, or send the output to a file", as, as)
}
