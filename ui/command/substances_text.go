package command

import (
	"fmt"
	"strings"

	"dropcrest/atmos"
	"dropcrest/solutes"
	"dropcrest/ui/answer"
	"dropcrest/ui/plain"
)

// substancesText is the catalogue to be read: two entries a substance, its values
// on a line, and below that the model that counts for it.
func substancesText(list []solutes.Substance, one bool, width int) string {
	var b strings.Builder
	if one {
		writeSubstance(&b, list[0], width)
		return b.String()
	}
	const columns = "%-30s %-13s %5s %6s %7s %5s %5s\n"
	fmt.Fprintf(&b, columns, "substance", "formula", "κ", "kg/m³", "g/mol", "DRH %", "ERH %")
	for _, s := range list {
		fmt.Fprintf(&b, columns, s.Name, s.Formula, short(s.Kappa, 1), short(s.Density, 1), short(s.MolarMass, 1e3),
			short(s.Deliquescence, 100), short(s.Efflorescence, 100))
		says := answer.ModelOf(s).Says
		if ofUser(s) {
			says = "user; " + says
		}
		b.WriteString(plain.Wrap(says, width, "  ") + "\n")
	}
	b.WriteString("\n" + plain.Wrap("κ is that at activation, kg/m³ the dry density, g/mol the molar mass, DRH and ERH the humidities of deliquescence "+
		"(at 25 °C) and efflorescence; - stands where a value is not known. Below stands the water-activity model that ion interaction uses, "+
		"with its source and its end. The word user marks what comes from your own file. "+
		"dropcrest substances NAME shows every value of a substance with its source.", width, "") + "\n")
	return b.String()
}

func short(d solutes.Datum, scale float64) string {
	if !d.Known() {
		return "-"
	}
	return fmt.Sprintf("%.5g", d.Value*scale)
}

// writeSubstance shows one substance, every value with its source.
func writeSubstance(b *strings.Builder, s solutes.Substance, width int) {
	const column = 29
	head := s.Name
	if s.Formula != "" {
		head += ", " + s.Formula
	}
	if ofUser(s) {
		head += " (user)"
	}
	b.WriteString(plain.Wrap(head, width, "") + "\n")
	if len(s.Aliases) > 0 {
		b.WriteString(plain.Wrap("also: "+strings.Join(s.Aliases, ", "), width, "") + "\n")
	}
	b.WriteByte('\n')
	b.WriteString(hang("water activity", answer.ModelOf(s).Says, column, width))
	for _, q := range quantities(s) {
		if q.datum.Known() {
			b.WriteString(hang(q.says, valueWords(q), column, width))
		}
	}
	if l := s.DeliquescenceLaw; l != nil {
		b.WriteString(hang("deliquescence by T", fmt.Sprintf("a law from %.4g to %.4g °C; %s",
			l.Low-atmos.ZeroCelsius, l.High-atmos.ZeroCelsius, answer.Sources(l.Source, l.Evidence)), column, width))
	}
	if gaps := s.Gaps(); len(gaps) > 0 {
		b.WriteString(hang("not known", strings.Join(gaps, "; "), column, width))
	}
	for _, r := range s.Remarks {
		b.WriteString("\n" + plain.Wrap(r, width, "") + "\n")
	}
}

func valueWords(q quantity) string {
	d := q.datum
	text := strings.TrimSpace(fmt.Sprintf("%.7g %s", d.Value, q.unit))
	if d.Low != 0 || d.High != 0 {
		text += fmt.Sprintf(" (%.7g to %.7g)", d.Low, d.High)
	}
	return text + "; " + answer.Sources(d.Source, d.Evidence)
}
