package command

import (
	"bytes"
	"errors"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"dropcrest/ui/answer"
	"dropcrest/ui/form"
	"dropcrest/ui/plain"
	"dropcrest/ui/terminal"
	"dropcrest/ui/verify"
)

// newVerify makes the command that recomputes published values.
func (w world) newVerify() *cobra.Command {
	cmd := &cobra.Command{
		Use:   "verify",
		Short: "Recompute published check values on this machine",
		Long: "Recomputes published check values on this machine and sets each beside its source. " +
			"Ends with exit code 1 if any value lies outside its tolerance.\n\n" +
			"The column seen says how a value came here: read in the source; memory, which means that it was " +
			"written down without reading the source again; or computed, which means that nobody printed it: it " +
			"was evaluated for this project with a general-purpose numerical library from the equations that the " +
			"source names, and checks the arithmetic, not nature.",
		Example: examples()["verify"],
		Args:    noArguments,
	}
	o := newOptions(cmd)
	o.form(cmd, "text", "csv", "json")
	o.plain(cmd)
	cmd.RunE = func(*cobra.Command, []string) error {
		if w.published == nil {
			return errors.New("this build holds no published values")
		}
		rows, err := verify.Run(w.published, verify.Options{})
		if err != nil {
			return err
		}
		var b bytes.Buffer
		switch o.as {
		case "csv":
			form.CSV(&b, verifyTable(rows))
		case "json":
			if err := form.Indented(&b, tableObjects(verifyTable(rows))); err != nil {
				return err
			}
		default:
			b.WriteString(verifyText(rows, w.width(), o.isPlain || !terminal.UTF8(w.env)))
		}
		if err := w.deliver(o.out, b.Bytes()); err != nil {
			return err
		}
		if n := failures(rows); n > 0 {
			return fmt.Errorf("%d of %d published values are not reproduced within their tolerance", n, len(rows))
		}
		return nil
	}
	return cmd
}

func failures(rows []verify.Row) int {
	n := 0
	for _, r := range rows {
		if r.Verdict != verify.Agrees {
			n++
		}
	}
	return n
}

func verifyTable(rows []verify.Row) answer.Table {
	t := answer.Table{Key: "verify"}
	for _, key := range []string{"quantity", "condition", "computed", "published", "difference",
		"tolerance", "source", "seen", "verdict", "unit", "remark"} {
		t.Columns = append(t.Columns, answer.Column{Key: key})
	}
	for _, r := range rows {
		t.Rows = append(t.Rows, []any{r.Quantity, r.Condition, r.Computed, r.Published, r.Difference,
			r.Tolerance, r.Source, r.Seen, string(r.Verdict), r.Unit, r.Remark})
	}
	return t
}

// tableObjects is a table as a list of JSON objects.
func tableObjects(t answer.Table) []form.Object {
	out := make([]form.Object, 0, len(t.Rows))
	for _, row := range t.Rows {
		var o form.Object
		for i, c := range t.Columns {
			v := row[i]
			if x, ok := v.(float64); ok {
				v = answer.Number(x)
			}
			o = append(o, at(c.Key, v))
		}
		out = append(out, o)
	}
	return out
}

// verifyText lists the values under their sources, two lines a value.
func verifyText(rows []verify.Row, width int, ascii bool) string {
	var b strings.Builder
	source := ""
	for _, r := range rows {
		if r.Source != source {
			source = r.Source
			b.WriteString("\n" + plain.Wrap(source+seenWords(r.Seen), width, "") + "\n")
		}
		what := r.Quantity
		if r.Condition != "" {
			what += ", " + r.Condition
		}
		b.WriteString(plain.Wrap(fmt.Sprintf("%-7s %s", r.Verdict, what), width, "  ") + "\n")
		b.WriteString(plain.Wrap(fmt.Sprintf("computed %.7g, published %.7g, difference %.2g, tolerance %.2g %s",
			r.Computed, r.Published, r.Difference, r.Tolerance, r.Unit), width, "          ") + "\n")
		if r.Remark != "" {
			b.WriteString(plain.Wrap(r.Remark, width, "          ") + "\n")
		}
	}
	fmt.Fprintf(&b, "\n%d of %d published values agree within their tolerance.\n", len(rows)-failures(rows), len(rows))
	text := strings.TrimLeft(b.String(), "\n")
	if ascii {
		return plain.ASCII(text)
	}
	return text
}

func seenWords(seen string) string {
	switch seen {
	case "memory":
		return " (from memory)"
	case "computed":
		return " (computed, not printed anywhere)"
	}
	return ""
}
