package command

import (
	"slices"

	"dropcrest/ui/scenario"
)

// implied lets an option that says something of one kind only choose that kind: --mode a
// population of modes, and --kappa the kappa model where a population is asked for.
// What contradicts each other is an error. given holds the options by what they set.
func (o *options) implied(s *scenario.Scenario, given map[scenario.Path]string) error {
	if !o.question.LooksAt("population") || !o.question.Heeds(*s, "population") {
		return nil
	}
	var by []string
	kinds := map[string]string{} // of populations, by option
	for _, key := range scenario.PopulationKeys() {
		if option, ok := given[scenario.Path(key)]; ok {
			by = append(by, option)
			kinds[option] = scenario.PopulationOf(key)
		}
	}
	if len(by) > 1 {
		return misused("--%s and --%s contradict each other: they give different populations, want one of them", by[0], by[1])
	}
	if len(by) == 1 {
		kind := kinds[by[0]]
		if _, ok := given["population"]; ok && s.Population != kind {
			return misused("--population %s and --%s contradict each other: want --population %s, or no --%s", s.Population, by[0], kind, by[0])
		}
		s.Population = kind
	}
	_, hasKappa := given["kappa"]
	if _, hasModel := given["water-activity"]; hasKappa && !hasModel && s.Kappa.Word == "" {
		s.WaterActivity = "kappa"
	}
	return nil
}

// countsIn reports whether a list of rows counts in the scenario as it stands.
func countsIn(key string, s *scenario.Scenario) bool {
	kind := scenario.PopulationOf(key)
	if key == "map" {
		kind = "data"
	}
	return kind == "" || kind == s.Population
}

// hasDefaultRows reports whether a list is as it is in a scenario that nobody has
// touched.
func hasDefaultRows(l scenario.RowList) bool {
	untouched := scenario.Default()
	for _, d := range scenario.Lists(&untouched) {
		if d.Key() == l.Key() {
			return slices.EqualFunc(shown(d), shown(l), slices.Equal)
		}
	}
	return false
}

// shown are the values of all rows as they are shown.
func shown(l scenario.RowList) [][]string {
	rows := make([][]string, l.Len())
	for i := range rows {
		for _, in := range l.Row(i) {
			rows[i] = append(rows[i], in.Show(scenario.Style{}))
		}
	}
	return rows
}

// isFile reports whether one of the inputs is the name of a file.
func isFile(inputs ...scenario.Input) bool {
	return slices.ContainsFunc(inputs, func(in scenario.Input) bool { return in.Kind() == scenario.File })
}
