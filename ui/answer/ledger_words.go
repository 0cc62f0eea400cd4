package answer

import (
	"fmt"
	"math"
	"slices"
	"strings"

	"dropcrest/koehler/ledger"
	"dropcrest/ui/scenario"
)

// finding names the largest assumption and the largest uncertainty, explains the
// chosen row, sets the two answers side by side, and says what would have to be
// measured better.
func (c *costs) finding() []string {
	var out []string
	for _, says := range []string{c.largestSentence(), c.sureSentence(), c.rowSentence(c.row()), c.sourceSentence(c.row()), c.detailSentence(c.row()),
		c.answersSentence(), c.reachSentence()} {
		if says != "" {
			out = append(out, says)
		}
	}
	return out
}

// largestSentence names what costs most, and beside it the largest of what the page
// assumes as it is asked: known, and known under a condition only.
func (c *costs) largestSentence() string {
	if math.IsNaN(c.full[c.chosen]) {
		return c.nothingSentence()
	}
	first := slices.IndexFunc(c.rows, func(r assumed) bool { return !isClosedForm(r.Key) })
	r := c.rows[first]
	switch x := r.change[c.chosen]; {
	case math.IsNaN(x):
		return fmt.Sprintf("No assumption about the %s has a cost that is known%s.", c.figure().says, c.perhaps(0))
	case x == 0:
		return fmt.Sprintf("No assumption changes the %s%s.", c.figure().says, c.perhaps(0))
	case r.made:
		return fmt.Sprintf("Largest cost: \"%s\", %s, and the %s page assumes it%s.", r.Says, signed(x), c.page, c.perhaps(x))
	}
	says := fmt.Sprintf("Largest cost: \"%s\", %s", r.Says, signed(r.change[c.chosen]))
	for _, m := range c.rows[first+1:] {
		if x := m.change[c.chosen]; m.made && !math.IsNaN(x) {
			return fmt.Sprintf("%s; of what the %s page assumes: \"%s\", %s%s.", says, c.page, m.Says, signed(x), c.perhaps(x))
		}
	}
	return fmt.Sprintf("%s; the %s page does not assume it%s.", says, c.page, c.perhaps(0))
}

// nothingSentence says that there is nothing to take apart.
func (c *costs) nothingSentence() string {
	if c.asked.LedgerOf == scenario.LedgerOfSpectrum {
		return fmt.Sprintf("Fewer than one particle per m³ activates at %s: nothing can be said of what it costs to simplify that.", percent(c.asked.AtSupersaturation))
	}
	return fmt.Sprintf("The fullest model has no %s: nothing can be said of what it costs to simplify it.", c.figure().says)
}

// isClosedForm tells a form that stands in place of an answer from what the answer
// assumes.
func isClosedForm(k ledger.Key) bool { return strings.HasPrefix(string(k), "closed_form_") }

// perhaps names what the page assumes and what would cost more than that under a
// condition, the largest of it.
func (c *costs) perhaps(than float64) string {
	var worst assumed
	size := math.Abs(than)
	for _, r := range c.rows {
		if x := math.Abs(r.ifChange[c.chosen]); r.made && r.ifSays != "" && r.status != ledger.Known && x > size {
			worst, size = r, x
		}
	}
	if worst.ifSays == "" {
		return ""
	}
	return fmt.Sprintf("; perhaps more: \"%s\", %s", worst.Says, signed(worst.ifChange[c.chosen]))
}

// sureSentence names the input that leaves most open.
func (c *costs) sureSentence() string {
	all := c.budget.Combined[c.chosen]
	if math.IsNaN(all) || math.IsNaN(c.full[c.chosen]) || len(c.budget.Contributions) == 0 {
		return ""
	}
	if all == 0 {
		return "No input is uncertain."
	}
	top := c.budget.Ranked(c.chosen)[0]
	says := fmt.Sprintf("Largest uncertainty: %s, %s, of %s in all", top.Quantity, plusMinus(top.Percent[c.chosen]), plusMinus(all))
	if c.trials != nil {
		if p := c.trials.Outcomes[c.chosen].Percent; !math.IsNaN(p) {
			says += fmt.Sprintf(" (%s by trials)", plusMinus(p))
		}
	}
	return says + "."
}

// rowSentence is the explanation of a row, in two sentences; before them why it has
// no number, or what it would cost under a condition.
func (c *costs) rowSentence(i int) string {
	r := c.rows[i]
	says := fmt.Sprintf("Row %d, %s:", i+1, c.costWords(r)) + after(c.ifSentence(r)) + after(c.pressureSentence(r))
	if r.status != ledger.Known && r.ifSays == "" {
		says += after(r.reason)
	}
	return says + after(r.Explains)
}

// detailSentence is what else a row says of this very answer; "": nothing.
func (c *costs) detailSentence(i int) string {
	if r := c.rows[i]; r.status == ledger.Known || r.ifSays != "" {
		return r.reason
	}
	return ""
}

func (c *costs) sourceSentence(i int) string { return "Source: " + c.rows[i].Source + "." }

func after(sentence string) string {
	if sentence == "" {
		return ""
	}
	return " " + sentence
}

// costWords is what a row costs, or why that is not said.
func (c *costs) costWords(r assumed) string {
	if x := r.change[c.chosen]; !math.IsNaN(x) {
		return signed(x)
	}
	if r.status == ledger.Known {
		return "no such figure"
	}
	return r.status.String()
}

func (c *costs) ifSentence(r assumed) string {
	if r.ifSays == "" || math.IsNaN(r.ifChange[c.chosen]) {
		return ""
	}
	return fmt.Sprintf("%s it would cost %s.", capital(r.ifSays), signed(r.ifChange[c.chosen]))
}

func (c *costs) pressureSentence(r assumed) string {
	if r.pressures == nil {
		return ""
	}
	return fmt.Sprintf("At the crest the pressure jump is %s Pa, the vapour's change %s Pa.", digits(r.pressures.Laplace, 3), digits(r.pressures.Vapour, 3))
}

// answersSentence sets what the page answers beside the fullest answer.
func (c *costs) answersSentence() string {
	f := c.figure()
	plain, full := c.plain[c.chosen], c.full[c.chosen]
	if math.IsNaN(plain) || math.IsNaN(full) {
		return ""
	}
	off := signed(100 * (plain/full - 1))
	if f.show(plain) == f.show(full) { // no further digits are earned
		return fmt.Sprintf("The %s page answers %s, %s from the fullest model.", c.page, f.show(plain), off)
	}
	return fmt.Sprintf("The %s page answers %s, the fullest model %s (%s).", c.page, f.show(plain), f.show(full), off)
}

// reachSentence says what must be measured better, and how well.
func (c *costs) reachSentence() string {
	needs, percent := c.needs()
	switch all := c.budget.Combined[c.chosen]; {
	case math.IsNaN(all) || math.IsNaN(c.full[c.chosen]) || all == 0:
		return ""
	case len(needs) == 0:
		return fmt.Sprintf("It is within %s already.", plusMinus(percent))
	}
	together := ""
	if len(needs) > 1 {
		together = ", all together"
	}
	var all []string
	for _, n := range needs {
		better := n.Input
		better.StandardUncertainty = n.Needed
		all = append(all, fmt.Sprintf("the %s to %s", n.Quantity, uncertaintyWords(better)))
	}
	return fmt.Sprintf("To reach %s measure %s.", plusMinus(percent), list(all)+together)
}

// needs are what must be measured better to come down to so many per cent.
func (c *costs) needs() (needs []ledger.Need, percent float64) {
	all := c.budget.Combined[c.chosen]
	percent = 100 * c.asked.Reach.Number
	if c.asked.Reach.Word != "" {
		percent = all / 2
	}
	if !(percent > 0) {
		return nil, percent
	}
	return c.budget.Reach(c.chosen, percent), percent
}

// uncertaintyWords is the standard uncertainty of an input as a person says it.
func uncertaintyWords(in ledger.Input) string {
	switch {
	case in.Quantity == ledger.Temperature:
		return "±" + digits(in.StandardUncertainty, 2) + " K"
	case in.Quantity == ledger.Pressure:
		return "±" + digits(in.StandardUncertainty/100, 2) + " hPa"
	}
	return plusMinus(100 * in.StandardUncertainty / in.Value)
}

// signed is a cost in per cent with its sign; nothing at all has none.
func signed(percent float64) string {
	switch a := math.Abs(percent); {
	case math.IsNaN(percent) || math.IsInf(percent, 0):
		return "none"
	case a == 0:
		return "0 %"
	case a < 0.001:
		return fmt.Sprintf("%+.1g %%", percent)
	case a < 0.01:
		return fmt.Sprintf("%+.4f %%", percent)
	case a < 0.1:
		return fmt.Sprintf("%+.3f %%", percent)
	case a < 1:
		return fmt.Sprintf("%+.2f %%", percent)
	}
	return fmt.Sprintf("%+.1f %%", percent)
}

func plusMinus(percent float64) string {
	return "±" + strings.TrimPrefix(strings.TrimPrefix(signed(math.Abs(percent)), "+"), "-")
}

// componentWords names the matter in a few words.
func componentWords(s scenario.Scenario) string {
	for _, l := range scenario.Lists(&s) {
		if l.Key() == "component" {
			return l.Show(scenario.Style{})
		}
	}
	return "matter"
}
