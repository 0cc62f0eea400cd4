package command

import (
	"bytes"
	"fmt"
	"strings"

	"github.com/spf13/cobra"

	"dropcrest/solutes"
	"dropcrest/ui/answer"
	"dropcrest/ui/form"
	"dropcrest/ui/plain"
	"dropcrest/ui/terminal"
)

// newSubstances makes the command that shows the catalogue.
func (w world) newSubstances() *cobra.Command {
	cmd := &cobra.Command{
		Use:   "substances [NAME]",
		Short: "List the substances that particles can be made of",
		Long: "Lists the substances that particles can be made of. With a name, a formula or an alias it shows one of them, " +
			"every value with its source.",
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

// quantity is one catalogued value of a substance with its name and unit.
type quantity struct {
	key, says, unit string
	datum           solutes.Datum
}

func quantities(s solutes.Substance) []quantity {
	return []quantity{
		{"molar_mass_kg_per_mol", "molar mass", "kg/mol", s.MolarMass},
		{"density_kg_per_m3", "density", "kg/m³", s.Density},
		{"ions", "number of ions", "", s.Ions},
		{"kappa", "κ at activation", "", s.Kappa},
		{"kappa_growth", "κ from growth factors", "", s.KappaGrowth},
		{"solubility_kg_per_kg", "solubility", "kg per kg of water", s.Solubility},
		{"volume_solubility", "solubility by volume", "m³ per m³ of water", s.VolumeSolubility},
		{"deliquescence_humidity_percent", "deliquescence humidity", "%", hundredfold(s.Deliquescence)},
		{"efflorescence_humidity_percent", "efflorescence humidity", "%", hundredfold(s.Efflorescence)},
		{"tension_increment_n_kg_per_m_mol", "surface tension increment", "N/m per mol/kg", s.TensionIncrement},
		{"shape_factor", "dynamic shape factor", "", s.ShapeFactor},
	}
}

// hundredfold turns a fraction into per cent.
func hundredfold(d solutes.Datum) solutes.Datum {
	d.Value, d.Low, d.High = 100*d.Value, 100*d.Low, 100*d.High
	return d
}

// substancesTable is the catalogue with one line a value.
func substancesTable(list []solutes.Substance) answer.Table {
	t := answer.Table{Key: "substances"}
	for _, key := range []string{"substance", "name", "formula", "quantity", "value", "low", "high", "source", "seen"} {
		t.Columns = append(t.Columns, answer.Column{Key: key})
	}
	for _, s := range list {
		for _, q := range quantities(s) {
			row := []any{s.Key, s.Name, s.Formula, q.key, nil, nil, nil, nil, nil}
			if d := q.datum; d.Known() {
				row = []any{s.Key, s.Name, s.Formula, q.key, d.Value, bound(d.Low), bound(d.High), d.Source, string(d.Evidence)}
			}
			t.Rows = append(t.Rows, row)
		}
	}
	return t
}

func bound(x float64) any {
	if x == 0 {
		return nil
	}
	return x
}

// substancesObject is the catalogue as a list, or one substance alone.
func substancesObject(list []solutes.Substance, one bool) any {
	out := make([]form.Object, 0, len(list))
	for _, s := range list {
		o := form.Object{at("key", s.Key), at("name", s.Name), at("formula", s.Formula), at("aliases", listed(s.Aliases))}
		for _, q := range quantities(s) {
			o = append(o, at(q.key, datumObject(q.datum)))
		}
		o = append(o, at("has_ion_interaction", s.Ion != nil),
			at("has_concentrated_polynomial", s.Concentrated != nil), at("remarks", listed(s.Remarks)))
		out = append(out, o)
	}
	if one {
		return out[0]
	}
	return out
}

// listed is a list that is written as [] when it is empty.
func listed(list []string) []string { return append([]string{}, list...) }

// at is one key of a JSON object.
func at(key string, value any) form.Member { return form.Member{Key: key, Value: value} }

func datumObject(d solutes.Datum) any {
	if !d.Known() {
		return nil
	}
	return form.Object{at("value", answer.Number(d.Value)), at("low", bound(d.Low)), at("high", bound(d.High)),
		at("source", d.Source), at("seen", string(d.Evidence))}
}

func substancesText(list []solutes.Substance, one bool, width int) string {
	var b strings.Builder
	if one {
		writeSubstance(&b, list[0], width)
		return b.String()
	}
	const columns = "%-26s %-13s %5s %6s %7s  %s\n"
	fmt.Fprintf(&b, columns, "substance", "formula", "κ", "kg/m³", "g/mol", "water activity")
	for _, s := range list {
		fmt.Fprintf(&b, columns, s.Name, s.Formula, short(s.Kappa, 1), short(s.Density, 1), short(s.MolarMass, 1e3), modelWords(s, false))
	}
	b.WriteString("\n" + plain.Wrap("κ is that at activation, - where a value is not known; kg/m³ is the dry density, g/mol the molar mass. "+
		"+ joins a published polynomial that reaches into supersaturated solution. A name shows every value with its source.", width, "") + "\n")
	return b.String()
}

func short(d solutes.Datum, scale float64) string {
	if !d.Known() {
		return "-"
	}
	return fmt.Sprintf("%.5g", d.Value*scale)
}

// modelWords names the best water activity model that a substance has; long
// names the publications of a model of its own.
func modelWords(s solutes.Substance, long bool) string {
	own := solutes.OwnModelWords(s)
	switch {
	case own != "" && long:
		return own
	case own != "":
		return "its own model"
	case s.Ion != nil && s.Concentrated.Joined() && long:
		return "ion interaction, joined to a published polynomial into supersaturated solution: " + s.Concentrated.Source
	case s.Ion != nil && s.Concentrated.Joined():
		return "ion interaction +"
	case s.Ion != nil:
		return "ion interaction"
	case s.Kappa.Known() && s.Kappa.Value > 0:
		return "kappa"
	case s.Ions.Known() && s.Ions.Value == 0:
		return "insoluble"
	case s.Ions.Known() && s.MolarMass.Known() && s.Density.Known():
		return "van 't Hoff"
	}
	return "none known"
}

// writeSubstance shows one substance, every value with its source.
func writeSubstance(b *strings.Builder, s solutes.Substance, width int) {
	fmt.Fprintf(b, "%s, %s\n", s.Name, s.Formula)
	if len(s.Aliases) > 0 {
		b.WriteString(plain.Wrap("also: "+strings.Join(s.Aliases, ", "), width, "") + "\n")
	}
	b.WriteByte('\n')
	for _, q := range quantities(s) {
		text := "not known"
		if d := q.datum; d.Known() {
			text = strings.TrimSpace(fmt.Sprintf("%.7g %s", d.Value, q.unit))
			if d.Low != 0 || d.High != 0 {
				text += fmt.Sprintf(" (%.7g to %.7g)", d.Low, d.High)
			}
			text += "; " + d.Source
			if d.Evidence != "" && d.Evidence != solutes.Read {
				text += " (" + evidenceWords(d.Evidence) + ")"
			}
		}
		b.WriteString(hang(q.says, text, 29, width))
	}
	b.WriteString(hang("water activity", modelWords(s, true), 29, width))
	for _, r := range s.Remarks {
		b.WriteString("\n" + plain.Wrap(r, width, "") + "\n")
	}
}

func evidenceWords(e solutes.Evidence) string {
	switch e {
	case solutes.Memory:
		return "from memory"
	case solutes.Computed:
		return "computed from other values"
	case solutes.User:
		return "given by the user"
	}
	return string(e)
}
