package scenario

import (
	"fmt"
	"strings"

	"dropcrest/koehler/ledger"
)

// What a ledger can be of: the keys of its questions.
const (
	LedgerOfCurve    = "curve"
	LedgerOfSpectrum = "spectrum"
	LedgerOfAscent   = "ascent"
)

// Uncertainty is how sure one input of a ledger is, where the usual is not meant.
type Uncertainty struct {
	Input    string  // a key of ledger.Quantities in the words of options
	Relative float64 // one standard uncertainty, a fraction of the value
}

var relativeUncertainty = &quantity{says: "share", units: []unit{perCent}, si: "percent", min: 0, max: 1, start: 0.05,
	step: stepper{small: 1, big: 5, decimals: 1}}

// reached is above 0: nothing is known without any uncertainty.
var reached = &quantity{says: "share", units: []unit{perCent}, si: "percent", min: 0, open: true, max: 1, start: 0.03,
	step: stepper{small: 1, big: 5, decimals: 1}}

func ledgerOf(pages ...string) func(*Scenario) bool {
	return func(s *Scenario) bool {
		for _, page := range pages {
			if s.LedgerOf == page {
				return true
			}
		}
		return false
	}
}

// ledgerFields declares what is asked of a ledger.
var ledgerFields = []field[Scenario]{
	{key: "of", says: "answer",
		words:  []Option{{LedgerOfCurve, "one particle"}, {LedgerOfSpectrum, "a population"}, {LedgerOfAscent, "rising air"}},
		help:   "Whose answer is taken apart: that of the Curve, the Spectrum or the Ascent page.",
		origin: "the Curve page is the heart of the program",
		at:     func(s *Scenario) any { return &s.LedgerOf }},
	{key: "particle-outcome", says: "figure of the particle",
		words: []Option{{"critical-supersaturation", "critical supersaturation"}, {"critical-wet-radius", "critical wet radius"}, {"haze-radius", "haze radius"}},
		help:  "Which figure of one particle the rows are sorted by.", origin: "what decides whether it activates",
		at: func(s *Scenario) any { return &s.ParticleOutcome }, used: ledgerOf(LedgerOfCurve)},
	{key: "at-supersaturation", says: "supersaturation of the count", quantity: supersaturation,
		help:   "The supersaturation at which the particles of a population are counted that activate.",
		origin: "a usual setting of counters (common practice)",
		at:     func(s *Scenario) any { return &s.AtSupersaturation }, used: ledgerOf(LedgerOfSpectrum)},
	{key: "ascent-outcome", says: "figure of the ascent",
		words: []Option{{"droplets", "number of droplets"}, {"peak-supersaturation", "peak supersaturation"}},
		help:  "Which figure of rising air the rows are sorted by.", origin: "what an ascent is asked for",
		at: func(s *Scenario) any { return &s.AscentOutcome }, used: ledgerOf(LedgerOfAscent)},
	{key: "row", says: "row", quantity: rowNumber,
		help:   "Which row is explained, counted from the largest.",
		origin: "the largest",
		at:     func(s *Scenario) any { return &s.LedgerRow }},
	{key: "reach", says: "uncertainty to be reached", quantity: reached, words: []Option{{"half", "half of it"}},
		help:   "The standard uncertainty of the figure, relative, for which the ledger says what must be measured better.",
		origin: "half of what it is",
		at:     func(s *Scenario) any { return &s.Reach }},
}

var rowNumber = &quantity{says: "number", units: []unit{bare}, min: 1, max: 40, whole: true, start: 1, step: stepper{small: 1, big: 5}}

// uncertaintyWords are the inputs whose relative uncertainty can be given. That of
// the temperature is one of kelvins and has an input of its own as well.
func uncertaintyWords() []Option {
	var out []Option
	for _, q := range ledger.Quantities() {
		out = append(out, Option{UncertaintyWord(q), q.String()})
	}
	return out
}

// UncertaintyWord is the word of a quantity in options and files.
func UncertaintyWord(q ledger.Quantity) string { return strings.ReplaceAll(q.Key(), "_", "-") }

// uncertaintyList is how sure inputs are of which better is known than the usual.
var uncertaintyList = list[Uncertainty]{
	key: "uncertainty", says: "known uncertainties",
	help: "How sure an input of the ledger is: input= with relative=, one standard uncertainty in per cent of the value; 0 leaves it out.",
	rows: func(s *Scenario) *[]Uncertainty { return &s.Uncertainties },
	fields: []field[Uncertainty]{
		{key: "input", says: "input", words: uncertaintyWords(),
			help: "The input whose uncertainty is given.", origin: "the first one",
			at: func(u *Uncertainty) any { return &u.Input }},
		{key: "relative", says: "standard uncertainty", quantity: relativeUncertainty,
			help: "One standard uncertainty in per cent of the value.", origin: "a start for typing",
			at: func(u *Uncertainty) any { return &u.Relative }},
	},
	standard: func() Uncertainty { return Uncertainty{UncertaintyWord(ledger.DryDiameter), relativeUncertainty.start} },
	required: []string{"input", "relative"},
	first:    "input",
	most:     20,
	show: func(s *Scenario) string {
		if len(s.Uncertainties) == 0 {
			return "usual"
		}
		return fmt.Sprintf("%d given", len(s.Uncertainties))
	},
}

// WithoutLedger blanks what only a ledger looks at.
func WithoutLedger(s Scenario) Scenario {
	s.LedgerOf, s.ParticleOutcome, s.AtSupersaturation, s.AscentOutcome, s.LedgerRow = "", "", 0, "", 0
	s.Reach, s.Uncertainties = Measure{}, nil
	return s
}
