package answer

import (
	"slices"

	"dropcrest/ui/scenario"
)

// Group is some of the inputs of a question under one heading, in the order of
// its help.
type Group struct {
	Title string
	Keys  []string // of inputs and of lists of rows
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
	{"The population", []string{"population", "mode", "bins", "data", "map", "rule", "penetration", "dry-size-is", "shape-factor", "record", "every", "average"}},
	{"The particles", []string{"component", "shares-by", "composition", "mixing", "kappa-spread", "adsorption"}},
	curveGroups[1],
	{"The air", []string{"temperature"}},
	{"Counts", []string{"supersaturation", "fit"}},
	{"Picture", []string{"axes"}},
}

// LooksAt reports whether the question looks at the input or list of that key.
// One scenario serves all questions; each looks at its part.
func (q Question) LooksAt(key string) bool {
	return slices.ContainsFunc(q.Groups, func(g Group) bool { return slices.Contains(g.Keys, key) })
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
