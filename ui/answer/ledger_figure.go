package answer

import (
	"math"

	"dropcrest/ui/figure"
)

// pictures are the rows and the inputs as signed bars.
func (c *costs) pictures() []figure.Figure {
	x := figure.Axis{Says: "change of the " + c.figure().says, Unit: "%"}
	costs := figure.Figure{Key: "assumptions", Title: "cost of each assumption, % of the " + c.figure().says, X: x}
	for i, r := range c.rows {
		costs.Bars = append(costs.Bars, figure.Bar{Says: r.Says, Value: r.change[c.chosen], Text: c.barWords(r), Chosen: i == c.row()})
	}
	x.Says = "standard uncertainty of the " + c.figure().says
	sure := figure.Figure{Key: "budget", Title: "what each input leaves open, % of the " + c.figure().says, X: x}
	for _, in := range c.budget.Ranked(c.chosen) {
		p := in.Percent[c.chosen]
		says := in.String() + " " + uncertaintyWords(in.Input)
		sure.Bars = append(sure.Bars, figure.Bar{Says: says, Value: p, Text: signed(p)})
	}
	return []figure.Figure{costs, sure}
}

// barWords is the cost beside the bar; in brackets what it would be under a
// condition that does not hold or is disputed.
func (c *costs) barWords(r assumed) string {
	x := c.costWords(r)
	if math.IsNaN(r.change[c.chosen]) && r.ifSays != "" && !math.IsNaN(r.ifChange[c.chosen]) {
		return "if: " + signed(r.ifChange[c.chosen])
	}
	return x
}
