package command

import (
	"bytes"
	"strings"

	"github.com/spf13/cobra"

	"dropcrest/solutes"
	"dropcrest/ui/form"
	"dropcrest/ui/plain"
	"dropcrest/ui/terminal"
)

// newSubstances makes the command that shows the catalogue.
func (w world) newSubstances() *cobra.Command {
	cmd := &cobra.Command{
		Use:   "substances [NAME]",
		Short: "List the substances that particles can be made of",
		Long: "Lists the substances that particles can be made of, with the water-activity model that counts for each and how far it reaches. " +
			"With a name, a formula or an alias it shows one of them, every value with its source, and what is not known. " +
			"CSV and JSON hold all that is known of all of them.",
		Example: examples()["substances"],
		Args:    atMostOne,
	}
	o := newOptions(cmd)
	cmd.ValidArgsFunction = o.names()
	o.substances(w)
	o.form(cmd, "text", "csv", "json")
	o.plain(cmd)
	cmd.RunE = func(_ *cobra.Command, args []string) error {
		known, err := o.catalogue()
		if err != nil {
			return err
		}
		list, err := chosen(known, args)
		if err != nil {
			return err
		}
		var b bytes.Buffer
		switch o.as {
		case "csv":
			form.CSV(&b, substancesTable(list))
		case "json":
			if err := form.Indented(&b, substancesObject(list, len(args) > 0)); err != nil {
				return err
			}
		default:
			text := substancesText(list, len(args) > 0, w.width())
			if o.isPlain || !terminal.UTF8(w.env) {
				text = plain.ASCII(text)
			}
			b.WriteString(text)
		}
		return w.deliver(o.out, b.Bytes())
	}
	return cmd
}

func atMostOne(cmd *cobra.Command, args []string) error {
	if len(args) <= 1 {
		return nil
	}
	return misused("%s takes one name: put a name of several words into quotes, %q", cmd.CommandPath(), strings.Join(args, " "))
}

func chosen(c *solutes.Catalogue, args []string) ([]solutes.Substance, error) {
	if len(args) == 0 {
		return c.All(), nil
	}
	if s, ok := c.Find(args[0]); ok {
		return []solutes.Substance{s}, nil
	}
	if near := c.Near(args[0], 3); len(near) > 0 {
		return nil, misused("no substance %q in the catalogue: did you mean %s?", args[0], strings.Join(near, ", "))
	}
	return nil, misused("no substance %q in the catalogue: dropcrest substances lists them", args[0])
}
