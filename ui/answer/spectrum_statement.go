package answer

import (
	"slices"

	"dropcrest/ui/scenario"
)

// spectrumStatement is the question in prose. As on the Curve page, what is at its
// usual value and rarely looked at lies behind the last slot.
func spectrumStatement(s scenario.Scenario) []string {
	lines := populationClauses(s)
	if s.KappaSpread != 1 {
		lines = append(lines, "spread of kappa {kappa-spread},")
	}
	if s.Population == "modes" && !slices.ContainsFunc(s.Modes, needsModel) { // kappa says it all
		lines = append(lines, "surface tension of {surface-tension},")
	} else {
		lines = append(lines, solutionClauses(s)...)
	}
	lines = append(lines, "in air of {temperature}, counted at {supersaturation},")
	if s.Fit != "none" {
		return append(lines, "fitted by {fit}, all else {further}.")
	}
	return append(lines, "all else {further}.")
}

// populationClauses name the particles and what they are of.
func populationClauses(s scenario.Scenario) []string {
	switch s.Population {
	case "modes":
		lines := []string{"Particles {population}:", "{mode},"}
		switch own := slices.ContainsFunc(s.Modes, hasOwnMatter); {
		case !own:
			return append(lines, "of {component}, {mixing} mixed,")
		case slices.ContainsFunc(s.Modes, func(m scenario.Mode) bool { return !hasOwnMatter(m) }):
			return append(lines, "of matter of their own, else {component}, {mixing} mixed,")
		}
		return append(lines, "each of its own matter,")
	case "bins":
		lines := []string{"Particles {population} {bins},", "of {component}, {mixing} mixed,"}
		if len(s.Map) > 0 {
			lines = slices.Insert(lines, 1, "columns {map},")
		}
		return lines
	}
	lines := []string{"Particles {population} {data},", "record {record}, {mixing} mixed, composition {composition},"}
	if s.Every.Word == "" || s.Average != "mean" {
		lines = slices.Insert(lines, 1, "{average} over {every},")
	}
	if len(s.Map) > 0 {
		lines = slices.Insert(lines, 1, "columns {map},")
	}
	if s.Composition == "measured" {
		return append(lines, "else {component},")
	}
	return append(lines, "of {component},")
}

// hasOwnMatter tells whether a mode says what it is of.
func hasOwnMatter(m scenario.Mode) bool {
	c := m.Matter
	return c.Substance != "" || c.Kappa.Word == "" || c.Density.Word == "" || c.MolarMass.Word == "" || c.Ions.Word == ""
}

// needsModel tells whether a model of water activity says how a mode activates.
func needsModel(m scenario.Mode) bool { return m.Matter.Kappa.Word != "" }
