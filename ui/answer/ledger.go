package answer

import (
	"context"
	"fmt"
	"math"
	"slices"
	"sort"
	"strconv"

	"dropcrest/atmos"
	"dropcrest/koehler/ledger"
	"dropcrest/ui/scenario"
)

func ledgerQuestion() Question {
	return Question{
		Key:       "ledger",
		Title:     "Ledger",
		Says:      "What does each assumption behind an answer cost, and how sure is the answer?",
		Groups:    ledgerGroups(),
		Live:      ledgerLive,
		Statement: ledgerStatement,
		Ask:       askLedger,
		Turns:     &Turns{Path: "row", Says: "row"},
		Counts:    ledgerCounts,
		Means:     ledgerMeans,
		Follow: func(s *scenario.Scenario, changed scenario.Path) {
			if changed == "of" {
				s.LedgerRow = 1 // rows of another answer
			}
		},
	}
}

// ledgerGroups are the inputs of the Ledger question: its own, and those of the
// questions that it takes apart.
func ledgerGroups() []Group {
	groups := []Group{
		{"The ledger", []string{"of", "particle-outcome", "at-supersaturation", "ascent-outcome", "row", "reach"}},
		{"How sure it is", []string{"uncertainty", "temperature-uncertainty", "surface-tension-uncertainty", "shape-factor-uncertainty", "trials", "seed", "coverage"}},
	}
	there := map[string]scenario.Path{}
	for _, of := range [][]Group{curveGroups, spectrumGroups, ascentGroups} {
		for _, g := range of {
			var keys []string
			for option, path := range g.Options() {
				if other, taken := there[option]; taken && other != path {
					option = string(path) // such as bins, a file on one page and a number on another
				}
				if _, taken := there[option]; taken {
					continue
				}
				there[option] = path
				keys = append(keys, option+"="+string(path))
			}
			switch at := slices.IndexFunc(groups, func(h Group) bool { return h.Title == g.Title }); {
			case len(keys) == 0:
			case at >= 0:
				groups[at].Keys = append(groups[at].Keys, keys...)
			default:
				groups = append(groups, Group{g.Title, keys})
			}
		}
	}
	return groups
}

// leftOutOfLedger only concerns pictures, tables, or many answers at once. The options
// are there, so that a command line of a page serves its ledger; a note says that they
// do not count.
var leftOutOfLedger = map[scenario.Path]bool{"points": true, "from-radius": true, "to-radius": true, "fit": true, "axes": true, "follow": true,
	"sweep": true, "cases": true, "part": true, "supersaturation": true, "humidity-history": true, "refinement": true}

// ledgerMeans tells a number of bins from a file of them: the pages have the same
// option for both.
func ledgerMeans(option, text string) (scenario.Path, bool) {
	_, err := strconv.Atoi(text)
	return "ascent-bins", option == "bins" && err == nil
}

// ledgerCounts tells whether an input counts: those of the question that is taken
// apart, and the ledger's own.
func ledgerCounts(s scenario.Scenario, path scenario.Path) bool {
	own := ledgerGroups()[:2]
	for _, g := range own {
		for _, p := range g.Options() {
			if p == path {
				return true
			}
		}
	}
	q, ok := Find(s.LedgerOf)
	return ok && q.LooksAt(string(path)) && !leftOutOfLedger[path]
}

// ledgerLive tells whether the answer takes no longer than a frame: air that rises
// many times does, and so do films and files.
func ledgerLive(s scenario.Scenario) bool {
	switch s.LedgerOf {
	case scenario.LedgerOfCurve:
		return len(s.Szyszkowski) == 0
	case scenario.LedgerOfSpectrum:
		return spectrumLive(s)
	}
	return false
}

// figureOf is one figure of an answer that a ledger takes apart.
type figureOf struct {
	key  string // of its change in JSON and tables: "critical_supersaturation"
	says string // "critical supersaturation"
	unit string // suffix of its key in JSON: "percent"
	show func(x float64) string
	si   func(x float64) float64 // as JSON has it
}

// assumed is one assumption with what it costs.
type assumed struct {
	ledger.Assumption
	status    ledger.Status
	reason    string
	made      bool
	change    ledger.Values // percent; NaN where there is none
	ifSays    string        // "": none
	ifChange  ledger.Values
	pressures *ledger.Pressures
}

// costs is a ledger before it is put into words, rows and bars.
type costs struct {
	asked   scenario.Scenario
	subject string     // "100 nm of ammonium sulfate at 25.0 °C"
	page    string     // title of the page whose answer it is
	figures []figureOf // as many as the answer has, at the places of its values
	chosen  ledger.Outcome
	plain   ledger.Values // of what was asked
	full    ledger.Values // of the fullest model
	models  []string
	rows    []assumed // the largest first
	budget  ledger.Budget
	trials  *ledger.MonteCarlo // nil: none were asked for
	rough   float64            // what trials may be off by, in standard uncertainties, before each is solved; 0: the usual
	solved  int                // trials that are solved one by one where they must; 0: the usual
	notes   []atmos.Note

	differing map[ledger.Quantity]bool // inputs that differ between kinds of particles
}

// ledgers are the answers that can be taken apart, by the keys of their questions.
var ledgers = map[string]func(context.Context, Env, scenario.Scenario) (*costs, error){
	scenario.LedgerOfCurve:    curveCosts,
	scenario.LedgerOfSpectrum: spectrumCosts,
	scenario.LedgerOfAscent:   ascentCosts,
}

// HasLedger reports whether the answer of that question can be taken apart.
func HasLedger(question string) bool {
	_, ok := ledgers[question]
	return ok
}

func askLedger(ctx context.Context, env Env, s scenario.Scenario) (Answer, error) {
	if err := ctx.Err(); err != nil {
		return Answer{}, err
	}
	of, ok := ledgers[s.LedgerOf]
	if !ok {
		return Answer{}, &InputError{"of", fmt.Sprintf("no answer %q to take apart: want curve, spectrum or ascent", s.LedgerOf)}
	}
	asked := env.ledgerAsked(s)
	kept := env.Kept.costsOf(asked)
	if kept == nil {
		c, err := of(ctx, env, s)
		if err != nil {
			return Answer{}, err
		}
		if err := c.draw(ctx, env); err != nil {
			return Answer{}, err
		}
		if s.Population != "bins" || s.LedgerOf == scenario.LedgerOfCurve { // whose file may change
			env.Kept.keepCosts(asked, c)
		}
		kept = c
	}
	c := *kept
	c.asked, c.rows = s, slices.Clone(kept.rows)
	c.choose()
	c.rank()
	return c.answer(), nil
}

// ledgerAsked is what the costs of a scenario depend on: which of them is looked at,
// and how, changes nothing.
func (env Env) ledgerAsked(s scenario.Scenario) ledgerKey {
	s = s.Clone()
	s.LedgerRow, s.ParticleOutcome, s.AscentOutcome, s.Reach = 0, "", "", scenario.Measure{}
	key := ledgerKey{of: s, catalogue: env.catalogue()}
	if s.LedgerOf != scenario.LedgerOfCurve {
		key.files = stampOf(env, s)
	}
	return key
}

// choose takes the figure that is asked for.
func (c *costs) choose() {
	c.chosen = 0
	switch s := c.asked; {
	case s.LedgerOf == scenario.LedgerOfCurve && s.ParticleOutcome == "critical-wet-radius":
		c.chosen = ledger.CriticalWetSize
	case s.LedgerOf == scenario.LedgerOfCurve && s.ParticleOutcome == "haze-radius":
		c.chosen = ledger.HazeSize
	case s.LedgerOf == scenario.LedgerOfAscent && s.AscentOutcome == "peak-supersaturation":
		c.chosen = 1
	}
}

// rank puts the rows in their order: by size, those without a number last.
func (c *costs) rank() {
	size := func(r assumed) float64 {
		if x := math.Abs(r.change[c.chosen]); x >= 0 {
			return x
		}
		return -float64(r.status) // NaN
	}
	sort.SliceStable(c.rows, func(i, j int) bool { return size(c.rows[i]) > size(c.rows[j]) })
}

// draw propagates the uncertainties by trials.
func (c *costs) draw(ctx context.Context, env Env) error {
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
	m, err := c.budget.MonteCarlo(ctx, ledger.Settings{Trials: n, Coverage: c.asked.Coverage, Seed: uint64(c.asked.Seed), Workers: max(1, env.Workers), Rough: c.rough, Solved: c.solved})
	switch {
	case ctx.Err() != nil:
		return ctx.Err()
	case err != nil:
		return &InputError{"trials", reason(err)}
	}
	c.trials = &m
	lost := 0
	for i := range c.figures {
		if !math.IsNaN(c.full[i]) {
			lost = max(lost, m.Outcomes[i].Lost)
		}
	}
	if lost > 0 {
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
	c.notes = append(c.notes, atmos.Note{Code: code, Input: input, Text: text})
}

// row is the one that is explained.
func (c *costs) row() int { return min(max(c.asked.LedgerRow, 1), len(c.rows)) - 1 }

func (c *costs) figure() figureOf { return c.figures[c.chosen] }

func (c *costs) answer() Answer {
	pictures := c.pictures()
	for i := range pictures {
		for _, n := range c.notes {
			pictures[i].Notes = append(pictures[i].Notes, n.Text)
		}
	}
	return Answer{Finding: c.finding(), Why: c.why(), Facts: c.facts(), Figures: pictures, Tables: c.tables(), Notes: c.notes,
		Record: c.row() + 1, Records: len(c.rows)}
}

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
