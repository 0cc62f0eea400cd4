package answer

import (
	"fmt"
	"math"
	"slices"

	"dropcrest/koehler/ledger"
)

// why is what stands behind the finding: what is compared, every row, every input.
func (c *costs) why() []string {
	out := []string{
		fmt.Sprintf("Of %s each assumption is taken alone against the fullest model at hand: the simplified answer minus the fullest one, in per cent of the fullest.", c.subject),
	}
	for _, m := range c.models {
		out = append(out, "Fullest model: "+m+".")
	}
	for i := range c.rows {
		out = append(out, capital(c.rows[i].Says)+". "+c.rowSentence(i)+after(c.detailSentence(i))+" "+c.sourceSentence(i))
	}
	for _, in := range c.budget.Ranked(c.chosen) {
		value := ", " + valueWords(in.Input) + ","
		if c.differing[in.Quantity] || in.Value == 1 {
			value = ""
		}
		out = append(out, fmt.Sprintf("The %s%s is uncertain by %s (%s): %s of the %s.", in.Quantity, value, uncertaintyWords(in.Input), in.Source,
			plusMinus(in.Percent[c.chosen]), c.figure().says))
	}
	out = append(out, c.propagationWords())
	for _, n := range slices.Concat(c.notes, c.told) {
		out = append(out, "Note: "+n.Text)
	}
	return out
}

// propagationWords say how the uncertainties were added.
func (c *costs) propagationWords() string {
	says := "Uncertainties are one standard deviation, propagated linearly (JCGM 100:2008)"
	if c.trials != nil {
		t := c.trials.Outcomes[c.chosen]
		says += fmt.Sprintf(" and by %d trials of normal inputs (JCGM 101:2008)", c.trials.Trials)
		if !math.IsNaN(t.Low) {
			says += fmt.Sprintf(": %s to %s hold %.4g %% of them", c.figure().show(t.Low), c.figure().show(t.High), 100*c.trials.Coverage)
		}
		if !c.trials.Direct {
			says += fmt.Sprintf("; trials take a polynomial of second degree that is off by at most %s of a standard uncertainty", plusMinus(c.trials.Deviation)[len("±"):])
		}
	}
	if r := c.budget.Correlation; r != 0 {
		says += fmt.Sprintf(". The tension of water falls with the temperature (correlation %.2f): that part is counted with the temperature", r)
	}
	return says + "."
}

// valueWords is the value of an input with its unit.
func valueWords(in ledger.Input) string {
	switch in.Quantity {
	case ledger.DryDiameter:
		return nanometres(in.Value) + " nm"
	case ledger.Temperature:
		return celsius(in.Value)
	case ledger.SurfaceTension:
		return digits(1e3*in.Value, 4) + " mN/m"
	case ledger.Pressure:
		return digits(in.Value/100, 4) + " hPa"
	}
	if u := in.Unit(); u != "1" {
		return digits(in.Value, 3) + " " + u
	}
	return digits(in.Value, 3)
}
