package command

import (
	"context"
	"errors"
	"slices"
	"time"

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
	o.form(cmd, form.FormatsOf(q)...)
	o.parts(cmd)
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
	chosen := ""
	if q.LooksAt("population") {
		chosen = "\n\n--mode, --bins or --data choose the population, and --kappa the kappa model."
	}
	if slices.Contains(q.Formats, "icartt") {
		chosen += " --record all takes the records of measured files one after the other: csv and jsonl hold a row for each record and supersaturation, " +
			"json the same under records, icartt a column for each supersaturation."
	}
	return q.Says + chosen + "\n\nValues are written with their unit, such as 100nm, 20C, 293.15K, 72mN/m, 95%. " +
		"Humidity and supersaturation are in per cent everywhere, also in CSV and JSON; all else is in SI units there."
}

// examples are one command line for each command.
func examples() map[string]string {
	return map[string]string{
		"curve":      "dropcrest curve --dry-diameter 50nm --component \"sodium chloride\"",
		"spectrum":   "dropcrest spectrum --mode \"N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3\" --supersaturation 0.1%,0.2%,0.5%",
		"kappa":      "dropcrest kappa --dry-diameter 80nm±3%rel --supersaturation 0.25%±5%rel",
		"counter":    "dropcrest counter --data scans.csv --as json --out calibration.json",
		"ascent":     "dropcrest ascent --mode \"N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3\" --updraft 0.3m/s",
		"ledger":     "dropcrest ledger --of curve --dry-diameter 20nm --component \"ammonium sulfate\"",
		"substances": "dropcrest substances \"ammonium sulfate\"",
		"verify":     "dropcrest verify --as csv --out verify.csv",
	}
}

// ask answers a question and writes the answer in the form that was asked for.
func (w world) ask(ctx context.Context, q answer.Question, s scenario.Scenario, notes []atmos.Note, o *options) (err error) {
	as := o.as
	if as == "" {
		as = "text"
	}
	if err := w.refuseBinary(as, o.out); err != nil {
		return err
	}
	env, err := o.environment(w)
	if err != nil {
		return err
	}
	ctx, stop := terminal.Context(ctx)
	defer stop()
	out, err := w.open(o.out)
	if err != nil {
		return err
	}
	defer func() {
		if err != nil {
			out.drop()
		}
	}()
	stream := form.NewStream(out, as)
	env.Columns, env.Row = o.rows(stream, as)
	meter := w.newMeter(o.out, form.Streams(as))
	env.Progress = meter.tell
	a, err := untilStopped(ctx, func() (answer.Answer, error) { return q.Ask(ctx, env, s) })
	meter.end()
	if err := interrupted(ctx); err != nil {
		return err
	}
	if out.err != nil {
		return out.problem(out.err)
	}
	if err != nil {
		return questionError(err, q, s)
	}
	a = withNotes(a, notes)
	sheet := form.Sheet{Question: q, Scenario: s, Answer: a, Version: version(), Table: o.table, Picture: o.picture, Made: time.Now(),
		Width: w.width(), ASCII: o.isPlain || !terminal.UTF8(w.env)}
	if err := stream.Close(sheet); err != nil && out.err == nil {
		return formError(err)
	}
	if err := interrupted(ctx); err != nil {
		return err
	}
	if !form.TellsNotes(as) {
		for _, n := range a.Notes {
			w.complain("note", n.Text)
		}
	}
	return out.commit()
}

// grace is how long a question that is to be stopped may take to notice it.
const grace = 500 * time.Millisecond

// untilStopped asks, and does not wait for long once the context has ended: a
// question may be waiting for a file that does not come.
func untilStopped(ctx context.Context, ask func() (answer.Answer, error)) (a answer.Answer, err error) {
	answered := make(chan struct{})
	go func() {
		defer close(answered)
		a, err = ask()
	}()
	select {
	case <-answered:
		return a, err
	case <-ctx.Done():
	}
	select {
	case <-answered:
		return a, err
	case <-time.After(grace):
		return answer.Answer{}, ctx.Err()
	}
}

// rows are where rows of records go that are found one after the other: into the
// stream, or nowhere when the form does not hold them, so that nobody keeps them.
func (o *options) rows(stream *form.Stream, as string) (columns func(string, []answer.Column) error, row func(string, []any) error) {
	if form.Streams(as) && (o.table == "" || o.table == form.RecordsTable) {
		return stream.Columns, stream.Row
	}
	return nil, func(string, []any) error { return nil }
}

// interrupted is the error of a context that has ended.
func interrupted(ctx context.Context) error {
	cause := context.Cause(ctx)
	var signal terminal.Signal
	if errors.As(cause, &signal) {
		return exitError{code: terminal.ExitCode(signal)}
	}
	return cause
}

// withNotes adds notes to an answer and to its pictures, which carry their own.
func withNotes(a answer.Answer, notes []atmos.Note) answer.Answer {
	a.Notes = append(notes, a.Notes...)
	for i := range a.Figures {
		for _, n := range notes {
			a.Figures[i].Notes = append(a.Figures[i].Notes, n.Text)
		}
	}
	return a
}

// formError names the option that an answer cannot follow.
func formError(err error) error {
	var part *form.PartError
	switch {
	case errors.As(err, &part):
		return misused("--%s: %v", part.What, err)
	case errors.Is(err, form.ErrNoRecords):
		return misused("--as icartt: %v: want --record all, of measured data", err)
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
