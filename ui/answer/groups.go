package answer

import (
	"iter"
	"slices"
	"strings"

	"dropcrest/ui/scenario"
)

// Group is some of the inputs of a question under one heading, in the order of
// its help.
type Group struct {
	Title string

	// Keys are those of inputs and of lists of rows. Where the option of a question
	// is called otherwise than its input, or stands for an input of a row, the key is
	// "option=path": "dry-diameter=point[0].dry-diameter".
	Keys []string
}

// Options are the options of the group in their order, each with the input or the
// list of rows that it sets.
func (g Group) Options() iter.Seq2[string, scenario.Path] {
	return func(yield func(string, scenario.Path) bool) {
		for _, key := range g.Keys {
			option, path, differs := strings.Cut(key, "=")
			if !differs {
				path = option
			}
			if !yield(option, scenario.Path(path)) {
				return
			}
		}
	}
}

// PathOf is the input or the list of rows that an option of the question sets.
func (q Question) PathOf(option string) (scenario.Path, bool) {
	for _, g := range q.Groups {
		for o, path := range g.Options() {
			if o == option {
				return path, true
			}
		}
	}
	return "", false
}

// OptionOf is the option of the question that sets an input or a list of rows.
func (q Question) OptionOf(path scenario.Path) (string, bool) {
	for _, g := range q.Groups {
		for option, p := range g.Options() {
			if p == path {
				return option, true
			}
		}
	}
	return "", false
}

// curveGroups are the inputs of the Curve question.
var curveGroups = []Group{
	{"The dry particle", []string{"dry-diameter", "dry-size-is", "shape-factor", "component", "shares-by", "adsorption"}},
	{"The solution", []string{"water-activity", "kappa", "vant-hoff-factor", "solubility", "surface-tension", "szyszkowski", "partitioning",
		"tolman", "solution-density", "kelvin"}},
	{"The air", []string{"temperature", "relative-humidity", "humidity-history"}},
	{"Table and picture", []string{"points", "from-radius", "to-radius"}},
}

// spectrumGroups are the inputs of the Spectrum question: those of the particles
// are the ones of a curve, without their size.
var spectrumGroups = []Group{
	{"The population", []string{"population", "mode", "bins", "data", "map", "calibration", "second-calibration", "rule", "penetration", "dry-size-is", "shape-factor", "record", "every", "average"}},
	{"The particles", []string{"component", "shares-by", "composition", "mixing", "kappa-spread", "adsorption"}},
	curveGroups[1],
	{"The air", []string{"temperature"}},
	{"Counts", []string{"supersaturation", "fit"}},
	{"Picture", []string{"axes"}},
}

// LooksAt reports whether the question looks at the input or list of rows of that
// path, which is its key unless it belongs to a row. One scenario serves all
// questions; each looks at its part.
func (q Question) LooksAt(path string) bool {
	_, ok := q.OptionOf(scenario.Path(path))
	return ok
}

// Inputs are the inputs of a scenario that the question looks at, those of rows
// left out.
func (q Question) Inputs(s *scenario.Scenario) []scenario.Input {
	return slices.DeleteFunc(scenario.Inputs(s), func(in scenario.Input) bool {
		return string(in.Path()) != in.Key() || !q.LooksAt(in.Key())
	})
}

// Lists are the lists of rows that the question looks at.
func (q Question) Lists(s *scenario.Scenario) []scenario.RowList {
	return slices.DeleteFunc(scenario.Lists(s), func(l scenario.RowList) bool { return !q.LooksAt(l.Key()) })
}
