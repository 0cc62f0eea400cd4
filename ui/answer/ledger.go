package answer

import (
	"context"
	"fmt"
	"math"
	"slices"
	"sort"

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
	trials  *ledger.MonteCarlo // of the chosen figure; nil: none were asked for
	drawn   string             // of which figure trials are; "": of none yet
	told    []atmos.Note       // about them
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
	kept := env.Kept.lastCosts().of(asked)
	if kept == nil {
		c, err := of(ctx, env, s)
		if err != nil {
			return Answer{}, err
		}
		kept = c
	}
	c := *kept
	c.asked, c.rows = s, slices.Clone(kept.rows)
	c.choose()
	if c.drawn != c.figure().key {
		if err := c.draw(ctx, env); err != nil {
			return Answer{}, err
		}
	}
	if s.Population != "bins" || s.LedgerOf == scenario.LedgerOfCurve { // whose file may change
		env.Kept.lastCosts().keep(asked, &c)
	}
	c.rank()
	return c.answer(), nil
}

// ledgerAsked is what the costs of a scenario depend on: which of them is looked at,
// and how, changes nothing.
func (env Env) ledgerAsked(s scenario.Scenario) askedKey {
	s = s.Clone()
	s.LedgerRow, s.ParticleOutcome, s.AscentOutcome, s.Reach = 0, "", "", scenario.Measure{}
	key := askedKey{of: s, catalogue: env.catalogue()}
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

// row is the one that is explained.
func (c *costs) row() int { return min(max(c.asked.LedgerRow, 1), len(c.rows)) - 1 }

func (c *costs) figure() figureOf { return c.figures[c.chosen] }

func (c *costs) answer() Answer {
	pictures, notes := c.pictures(), slices.Concat(c.notes, c.told)
	for i := range pictures {
		for _, n := range notes {
			pictures[i].Notes = append(pictures[i].Notes, n.Text)
		}
	}
	return Answer{Finding: c.finding(), Why: c.why(), Facts: c.facts(), Figures: pictures, Tables: c.tables(), Notes: notes,
		Record: c.row() + 1, Records: len(c.rows)}
}
