package command

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"slices"
	"strings"

	"github.com/spf13/cobra"

	"dropcrest/atmos"
	"dropcrest/solutes"
	"dropcrest/ui/answer"
	"dropcrest/ui/figure"
	"dropcrest/ui/figure/print"
	"dropcrest/ui/plain"
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
	o.inputs(cmd)
	o.from(cmd)
	o.form(cmd, append([]string{"text", "csv", "json"}, print.Formats()...)...)
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
	form := o.as
	if err := w.refuseBinary(form, o.out); err != nil {
		return err
	}
	a, err := q.Ask(ctx, answer.Env{Substances: solutes.Standard(), Version: version()}, s)
	if err != nil {
		return questionError(err)
	}
	a.Notes = append(notes, a.Notes...)
	var b bytes.Buffer
	switch form {
	case "", "text":
		w.writeText(&b, q, s, a, o)
		return w.deliver(o.out, b.Bytes())
	case "json":
		if err := writeJSON(&b, s, a); err != nil {
			return err
		}
		return w.deliver(o.out, b.Bytes())
	case "csv":
		writeCSV(&b, a.Tables[0])
	default:
		if err := drawFigure(&b, s, a, notes, form); err != nil {
			return err
		}
	}
	// These forms have no place for notes that a reader is sure to see.
	for _, n := range a.Notes {
		w.complain("note", n.Text)
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
func (w world) refuseBinary(form, out string) error {
	if form != "png" && form != "pdf" || out != "" && out != "-" || !isTerminal(w.out) {
		return nil
	}
	return misused("--as %s writes a binary file, which a terminal cannot show: add --out FILE.%s, or send the output to a file", form, form)
}

func drawFigure(b *bytes.Buffer, s scenario.Scenario, a answer.Answer, notes []atmos.Note, form string) error {
	if len(a.Figures) == 0 {
		return errors.New("this answer has no picture")
	}
	f := a.Figures[0]
	for _, n := range notes {
		f.Notes = append(f.Notes, n.Text)
	}
	frame, _ := answer.CurveFrame(s, f, figure.Frame{}, pictureHeight)
	return print.Write(b, f, frame, form)
}

// pictureHeight is the height of the picture in text, axis included.
const pictureHeight = 16

// writeText is the answer for a reader: the question in words, the picture, the
// finding, the notes.
func (w world) writeText(b *bytes.Buffer, q answer.Question, s scenario.Scenario, a answer.Answer, o *options) {
	st := scenario.Style{ASCII: o.isPlain || !terminal.UTF8(w.env)}
	width := w.width()
	say := func(text string) {
		text = plain.Clean(text)
		if st.ASCII {
			text = plain.ASCII(text)
		}
		b.WriteString(wrap(text, width, "") + "\n")
	}
	say(statement(q, s, st))
	b.WriteByte('\n')
	for _, f := range a.Figures {
		say(f.Title)
		fr, _ := answer.CurveFrame(s, f, figure.Frame{}, pictureHeight)
		cells := figure.Text(f, fr, width, pictureHeight, figure.Style{ASCII: st.ASCII})
		b.WriteString(strings.Join(figure.Lines(cells), "\n") + "\n\n")
	}
	say(strings.Join(a.Finding, " "))
	gap := "\n"
	for _, n := range a.Notes {
		if !slices.Contains(a.Finding, n.Text) { // once is enough
			b.WriteString(gap)
			say("note: " + n.Text)
			gap = ""
		}
	}
}

// statement is the question in prose with its values.
func statement(q answer.Question, s scenario.Scenario, st scenario.Style) string {
	lists := scenario.Lists(&s)
	value := func(slot string) string {
		for _, l := range lists {
			if l.Key() == slot {
				return l.Show(st)
			}
		}
		if in, ok := scenario.Find(&s, scenario.Path(slot)); ok {
			return in.Show(st)
		}
		return slot
	}
	lines := q.Statement(s)
	for i, line := range lines {
		lines[i] = answer.Fill(line, value)
	}
	return strings.Join(lines, " ")
}
