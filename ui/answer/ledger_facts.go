package answer

import (
	"math"

	"dropcrest/koehler/ledger"
	"dropcrest/ui/scenario"
)

// LedgerFacts is the JSON object of the Ledger question. Scripts rely on its keys.
type LedgerFacts struct {
	Of                 string          `json:"of"`        // curve | spectrum | ascent
	Outcome            string          `json:"outcome"`   // by which rows are sorted and the budget is made
	Reference          LedgerAnswer    `json:"reference"` // of the fullest model
	Answer             LedgerAnswer    `json:"answer"`    // of the page as it is asked
	Change             Number          `json:"change_percent"`
	Assumptions        []AssumptionRow `json:"assumptions"` // the largest first
	Budget             []BudgetRow     `json:"budget"`      // likewise
	CombinedLinear     Number          `json:"combined_percent_linear"`
	CombinedMonteCarlo Number          `json:"combined_percent_monte_carlo"`
	MonteCarlo         *LedgerTrials   `json:"monte_carlo"` // null: no trials were asked for
	TensionCorrelation Number          `json:"correlation_of_temperature_and_surface_tension"`
	Reach              Number          `json:"reach_percent"`
	Needs              []NeedRow       `json:"needs"` // what must be measured better for that
}

// LedgerAnswer holds the figures of an answer; null what it has not.
type LedgerAnswer struct {
	CriticalSupersaturation Number `json:"critical_supersaturation_percent"`
	CriticalWetRadius       Number `json:"critical_wet_radius_m"`
	HazeRadius              Number `json:"haze_radius_m"`
	CCN                     Number `json:"ccn_per_m3"`
	Droplets                Number `json:"droplets_per_m3"`
	PeakSupersaturation     Number `json:"peak_supersaturation_percent"`
}

// LedgerChange holds changes in per cent; null of what the answer has not.
type LedgerChange struct {
	CriticalSupersaturation Number `json:"change_in_critical_supersaturation_percent"`
	CriticalWetRadius       Number `json:"change_in_critical_wet_radius_percent"`
	HazeRadius              Number `json:"change_in_haze_radius_percent"`
	CCN                     Number `json:"change_in_ccn_percent"`
	Droplets                Number `json:"change_in_droplets_percent"`
	PeakSupersaturation     Number `json:"change_in_peak_supersaturation_percent"`
}

// AssumptionRow is what one assumption costs.
type AssumptionRow struct {
	Key  string `json:"key"`
	Says string `json:"says"`
	LedgerChange
	Known    bool    `json:"known"`
	Status   string  `json:"status"` // known | not known | not applicable
	Made     bool    `json:"made"`   // by the answer as it is asked
	Reason   *string `json:"reason"`
	Explains string  `json:"explains"`
	Source   string  `json:"source"`
	If       *IfRow  `json:"if"` // null: there is none
	Laplace  Number  `json:"laplace_pressure_pa"`
	Vapour   Number  `json:"vapour_pressure_change_pa"`
}

// IfRow is what an assumption would cost under a condition that does not hold or is
// disputed.
type IfRow struct {
	Says string `json:"says"`
	LedgerChange
}

// BudgetRow is what one input leaves open.
type BudgetRow struct {
	Input               string `json:"input"`
	Value               Number `json:"value"`
	Unit                string `json:"unit"`
	StandardUncertainty Number `json:"standard_uncertainty"`
	Sensitivity         Number `json:"sensitivity"` // change of the logarithm of the outcome for one unit of the input
	Contribution        Number `json:"contribution_percent"`
	Share               Number `json:"share_of_variance_percent"`
	Source              string `json:"source"`
}

// unitOf is the unit in which an input is told, and the factor to it: supersaturations
// are in per cent, and what differs between kinds of particles is a factor.
func (c *costs) unitOf(in ledger.Input) (unit string, scale float64) {
	switch {
	case c.differing[in.Quantity]:
		return "1", 1
	case in.Quantity == ledger.Supersaturation:
		return "percent", 100
	}
	return in.Unit(), 1
}

// LedgerTrials is the outcome over all trials.
type LedgerTrials struct {
	Trials   int    `json:"trials"`
	Coverage Number `json:"coverage_percent"`
	Mean     Number `json:"mean"` // in the unit of the reference
	Median   Number `json:"median"`
	Low      Number `json:"low"`
	High     Number `json:"high"`
	Lost     int    `json:"lost"` // trials without the outcome
}

// NeedRow is an input that must be known better.
type NeedRow struct {
	Input  string `json:"input"`
	Unit   string `json:"unit"`
	Now    Number `json:"standard_uncertainty"`
	Needed Number `json:"needed_standard_uncertainty"`
}

// of returns the number of each figure by its key; NaN for those that the answer
// does not have.
func (c *costs) of(number func(f figureOf, i int) float64) func(key string) Number {
	return func(key string) Number {
		for i, f := range c.figures {
			if f.key == key {
				return Number(number(f, i))
			}
		}
		return Number(math.NaN())
	}
}

func (c *costs) answerOf(v ledger.Values) LedgerAnswer {
	x := c.of(func(f figureOf, i int) float64 { return f.si(v[i]) })
	return LedgerAnswer{x("critical_supersaturation"), x("critical_wet_radius"), x("haze_radius"), x("ccn"), x("droplets"), x("peak_supersaturation")}
}

func (c *costs) changeOf(v ledger.Values) LedgerChange {
	x := c.of(func(_ figureOf, i int) float64 { return v[i] })
	return LedgerChange{x("critical_supersaturation"), x("critical_wet_radius"), x("haze_radius"), x("ccn"), x("droplets"), x("peak_supersaturation")}
}

func (c *costs) facts() LedgerFacts {
	gap := Number(math.NaN())
	needs, reach := c.needs()
	f := LedgerFacts{Of: c.asked.LedgerOf, Outcome: c.figure().key, Reference: c.answerOf(c.full), Answer: c.answerOf(c.plain),
		Change:         Number(100 * (c.plain[c.chosen]/c.full[c.chosen] - 1)),
		CombinedLinear: Number(c.budget.Combined[c.chosen]), CombinedMonteCarlo: gap, TensionCorrelation: gap,
		Reach: Number(reach), Assumptions: []AssumptionRow{}, Budget: []BudgetRow{}, Needs: []NeedRow{}}
	if c.asked.LedgerOf == scenario.LedgerOfCurve { // elsewhere it is not worked out
		f.TensionCorrelation = Number(c.budget.Correlation)
	}
	for _, r := range c.rows {
		f.Assumptions = append(f.Assumptions, c.assumption(r))
	}
	for _, in := range c.budget.Ranked(c.chosen) {
		unit, scale := c.unitOf(in.Input)
		f.Budget = append(f.Budget, BudgetRow{in.Key(), Number(scale * in.Value), unit, Number(scale * in.StandardUncertainty),
			Number(in.Sensitivity[c.chosen] / scale), Number(in.Percent[c.chosen]), Number(100 * in.Share[c.chosen]), in.Source})
	}
	if t := c.trials; t != nil {
		d, si := t.Outcomes[c.chosen], c.figure().si
		f.CombinedMonteCarlo = Number(d.Percent)
		f.MonteCarlo = &LedgerTrials{t.Trials, Number(100 * t.Coverage), Number(si(d.Mean)), Number(si(d.Median)), Number(si(d.Low)), Number(si(d.High)), d.Lost}
	}
	for _, n := range needs {
		unit, scale := c.unitOf(n.Input)
		f.Needs = append(f.Needs, NeedRow{n.Key(), unit, Number(scale * n.StandardUncertainty), Number(scale * n.Needed)})
	}
	return f
}

func (c *costs) assumption(r assumed) AssumptionRow {
	row := AssumptionRow{Key: string(r.Key), Says: r.Says, LedgerChange: c.changeOf(r.change), Known: r.status == ledger.Known, Status: r.status.String(),
		Made: r.made, Explains: r.Explains, Source: r.Source, Laplace: Number(math.NaN()), Vapour: Number(math.NaN())}
	if r.reason != "" {
		row.Reason = &r.reason
	}
	if r.ifSays != "" {
		row.If = &IfRow{r.ifSays, c.changeOf(r.ifChange)}
	}
	if r.pressures != nil {
		row.Laplace, row.Vapour = Number(r.pressures.Laplace), Number(r.pressures.Vapour)
	}
	return row
}

// tables are the numbers behind picture and finding.
func (c *costs) tables() []Table {
	return []Table{c.assumptionsTable(), c.budgetTable()}
}

func (c *costs) assumptionsTable() Table {
	t := Table{Key: "assumptions", Title: "What each assumption costs", Columns: []Column{{"key", "key"}}}
	for _, f := range c.figures {
		t.Columns = append(t.Columns, Column{"change_in_" + f.key + "_percent", f.says + ", %"})
	}
	t.Columns = append(t.Columns, Column{"known", "known"}, Column{"made", "made"}, Column{"status", "status"}, Column{"says", "assumption"}, Column{"if", "if"})
	for _, f := range c.figures {
		t.Columns = append(t.Columns, Column{"if_change_in_" + f.key + "_percent", f.says + " then, %"})
	}
	t.Columns = append(t.Columns, Column{"reason", "reason"}, Column{"explains", "what it means"}, Column{"source", "source"})
	words := func(text string) any {
		if text == "" {
			return nil
		}
		return text
	}
	for _, r := range c.rows {
		row := []any{string(r.Key)}
		for i := range c.figures {
			row = append(row, cell(r.change[i]))
		}
		row = append(row, r.status == ledger.Known, r.made, r.status.String(), r.Says, words(r.ifSays))
		for i := range c.figures {
			if r.ifSays == "" {
				row = append(row, nil)
				continue
			}
			row = append(row, cell(r.ifChange[i]))
		}
		t.Rows = append(t.Rows, append(row, words(r.reason), r.Explains, r.Source))
	}
	return t
}

func (c *costs) budgetTable() Table {
	t := Table{Key: "budget", Title: "What each input leaves open", Columns: []Column{{"input", "input"}, {"value", "value"}, {"unit", "unit"},
		{"standard_uncertainty", "standard uncertainty"}, {"sensitivity", "sensitivity, 1 a unit"}, {"contribution_percent", "contribution, %"}, {"source", "source"}}}
	for _, in := range c.budget.Ranked(c.chosen) {
		unit, scale := c.unitOf(in.Input)
		t.Rows = append(t.Rows, []any{in.Key(), cell(scale * in.Value), unit, cell(scale * in.StandardUncertainty), cell(in.Sensitivity[c.chosen] / scale),
			cell(in.Percent[c.chosen]), in.Source})
	}
	return t
}
