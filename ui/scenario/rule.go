package scenario

import (
	"math"

	"dropcrest/koehler/spectrum"
)

// Rule changes the bounds of one rule of quality, in the unit of the rule.
type Rule struct {
	Key    string
	Flag   Measure // from where a point is flagged, or "usual" | "never"
	Reject Measure // from where it is left out, or "usual" | "never"
}

// bound is any number: the rule itself says which bounds make sense.
var bound = &quantity{says: "number", units: []unit{bare}, min: 0, max: 1e12, start: 1, step: stepper{ladder: true}}

var boundWords = []Option{{"usual", "usual"}, {"never", "never"}}

// ruleWords are the rules there are.
func ruleWords() []Option {
	var out []Option
	for _, r := range spectrum.Defaults() {
		out = append(out, Option{r.Key, r.Says})
	}
	return out
}

// ruleList is the rules of quality whose bounds are not the usual ones.
var ruleList = list[Rule]{
	key: "rule", says: "quality rules",
	help: "Another bound for a rule of quality: rule= with flag= or reject=, in the unit of the rule, or never. Each rejection is counted with its reason.",
	rows: func(s *Scenario) *[]Rule { return &s.Rules },
	fields: []field[Rule]{
		{key: "rule", says: "rule", words: ruleWords(),
			help: "The rule whose bounds change.", origin: "the first one",
			at: func(r *Rule) any { return &r.Key }},
		{key: "flag", says: "flag from", quantity: bound, words: boundWords,
			help: "From where a point is flagged; it is still used.", origin: "the usual bound of the rule",
			at: func(r *Rule) any { return &r.Flag }},
		{key: "reject", says: "reject from", quantity: bound, words: boundWords,
			help: "From where a point is left out.", origin: "the usual bound of the rule",
			at: func(r *Rule) any { return &r.Reject }},
	},
	standard: func() Rule { return Rule{spectrum.Defaults()[0].Key, Measure{Word: "usual"}, Measure{Word: "usual"}} },
	required: []string{"rule"},
	first:    "rule",
	most:     20,
	show: func(s *Scenario) string {
		if len(s.Rules) == 0 {
			return "usual"
		}
		return count(len(s.Rules), "rule") + " changed"
	},
}

// QualityRules are the rules with the bounds that the scenario asks for.
func (s Scenario) QualityRules() []spectrum.Rule {
	rules := spectrum.Defaults()
	for _, change := range s.Rules {
		for i := range rules {
			if rules[i].Key == change.Key {
				rules[i].Flag = changed(rules[i].Flag, change.Flag)
				rules[i].Reject = changed(rules[i].Reject, change.Reject)
			}
		}
	}
	return rules
}

func changed(usual float64, m Measure) float64 {
	switch m.Word {
	case "usual":
		return usual
	case "never":
		return math.NaN()
	}
	return m.Number
}
