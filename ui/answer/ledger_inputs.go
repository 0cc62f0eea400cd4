package answer

import (
	"context"
	"fmt"
	"math"
	"slices"

	"dropcrest/atmos"
	"dropcrest/koehler/ledger"
	"dropcrest/ui/scenario"
)

// known sets the uncertainties that the scenario gives in place of the usual ones.
func known(inputs []ledger.Input, s scenario.Scenario) []ledger.Input {
	const given = "given in the scenario"
	for i := range inputs {
		in := &inputs[i]
		for _, u := range s.Uncertainties {
			if u.Input == scenario.UncertaintyWord(in.Quantity) {
				in.StandardUncertainty, in.Source = u.Relative*in.Value, given
			}
		}
		for _, u := range []struct {
			of    ledger.Quantity
			value float64
		}{{ledger.Temperature, s.TemperatureUncertainty}, {ledger.SurfaceTension, s.TensionUncertainty}, {ledger.ShapeFactor, s.ShapeUncertainty}} {
			if in.Quantity == u.of && u.value > 0 {
				in.StandardUncertainty, in.Source = u.value, given
			}
		}
	}
	return inputs
}

// unknownInputs are notes on uncertainties that were given of what the answer has no
// input of.
func unknownInputs(inputs []ledger.Input, s scenario.Scenario) []atmos.Note {
	var notes []atmos.Note
	for _, u := range s.Uncertainties {
		if !slices.ContainsFunc(inputs, func(in ledger.Input) bool { return u.Input == scenario.UncertaintyWord(in.Quantity) }) {
			notes = append(notes, atmos.Note{Code: "uncertainty-unused", Input: "uncertainty",
				Text: fmt.Sprintf("The uncertainty of %s is not used: this answer has no such input.", u.Input)})
		}
	}
	if s.ShapeUncertainty > 0 && !slices.ContainsFunc(inputs, func(in ledger.Input) bool { return in.Quantity == ledger.ShapeFactor }) {
		notes = append(notes, atmos.Note{Code: "uncertainty-unused", Input: "shape-factor-uncertainty",
			Text: "The uncertainty of the shape factor is not used: this answer has no such input."})
	}
	return notes
}

// draw propagates the uncertainties of the chosen figure by trials.
func (c *costs) draw(ctx context.Context, env Env) error {
	c.drawn, c.trials, c.told = c.figure().key, nil, nil
	n := int(c.asked.Trials.Number)
	switch {
	case c.asked.Trials.Word != "":
		n = usualTrials
		c.note("trials-usual", "trials", fmt.Sprintf("A ledger makes %d trials where as many as needed are asked for.", n))
	case n == 0:
		return nil
	case n < leastTrials:
		return &InputError{"trials", fmt.Sprintf("%d trials tell nothing: want %d or more, or 0 for linear propagation alone", n, leastTrials)}
	}
	m, err := c.budget.MonteCarlo(ctx, ledger.Settings{Trials: n, Coverage: c.asked.Coverage, Seed: uint64(c.asked.Seed), Workers: max(1, env.Workers),
		Only: []ledger.Outcome{c.chosen}, Rough: c.rough, Solved: c.solved})
	switch {
	case ctx.Err() != nil:
		return ctx.Err()
	case err != nil:
		return &InputError{"trials", reason(err)}
	}
	c.trials = &m
	if lost := m.Outcomes[c.chosen].Lost; lost > 0 && !math.IsNaN(c.full[c.chosen]) {
		c.note("trials-lost", "uncertainty", fmt.Sprintf("%d of %d trials have no answer, because an input is off by all of its value or nothing activates: "+
			"the inputs are too uncertain for the numbers of this budget to be taken at their word.", lost, m.Trials))
	}
	if m.Direct && m.Trials < n {
		c.note("trials-solved", "trials", fmt.Sprintf("The answer bends so much within the uncertainties that each trial was worked out by itself: %d of them instead of %d.", m.Trials, n))
	}
	return nil
}

// fewTrials is how many trials are solved where each takes milliseconds; their standard
// deviation is good to 4 %.
const usualTrials, leastTrials, fewTrials = 100000, 100, 400

func (c *costs) note(code, input, text string) {
	c.told = append(c.told, atmos.Note{Code: code, Input: input, Text: text})
}
