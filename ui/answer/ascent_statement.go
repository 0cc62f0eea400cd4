package answer

import (
	"slices"

	"dropcrest/ui/scenario"
)

// ascentStatement is the question in prose: how the air rises, and what is in it.
func ascentStatement(s scenario.Scenario) []string {
	if s.Cases != "" {
		return append([]string{"Air of each case of {cases}, else", "of {temperature}, {pressure}, {start-humidity} humidity, that rises at {updraft},"},
			append(risingClauses(s), "all else {further}.")...)
	}
	lines := []string{"Air of {temperature}, {pressure}, {start-humidity} humidity rises at {updraft},"}
	if s.UpdraftSpread > 0 {
		lines = append(lines, "with a spread of {updraft-spread}, weighted {updraft-weighting},")
	}
	lines = append(lines, risingClauses(s)...)
	if s.Sweep != "" {
		return append(lines, "followed {follow}, swept over", "{sweep},", "all else {further}.")
	}
	return append(lines, "followed {follow}, sweep {sweep}, all else {further}.")
}

// risingClauses name the particles as on the Spectrum page.
func risingClauses(s scenario.Scenario) []string {
	lines := populationClauses(s)
	lines[0] = "with particles" + lines[0][len("Particles"):]
	if s.KappaSpread != 1 {
		lines = append(lines, "spread of kappa {kappa-spread},")
	}
	if s.Population == "modes" && !slices.ContainsFunc(s.Modes, needsModel) { // kappa says it all
		return append(lines, "surface tension of {surface-tension},")
	}
	return append(lines, solutionClauses(s)...)
}

// Costs of an ascent in bins of particles with a kappa. Particles of any other kind
// take more time a bin; measured by BenchmarkAscent.
const (
	mostLiveBins = 900
	slowBins     = 4
)

// ascentIsLive tells whether the answer takes no longer than a frame.
func ascentIsLive(s scenario.Scenario) bool {
	if s.Sweep != "" || s.Cases != "" || s.UpdraftSpread > 0 || s.Updraft < weakestUpdraft/3 {
		return false
	}
	if s.Population != "modes" && !(s.Population == "data" && onlyDemo(s.Data)) {
		return false
	}
	groups, bins := 1, 0
	if s.Mixing == "external" {
		groups = max(1, len(s.Components))
	}
	if s.KappaSpread > 1 {
		groups *= 7 // as package ascent cuts a spread
	}
	for _, m := range s.Modes {
		cost := s.AscentBins * groups
		if s.WaterActivity != "kappa" && needsModel(m) {
			cost *= slowBins
		}
		bins += cost
	}
	if s.Population == "data" {
		bins = s.AscentBins * groups
	}
	return bins <= mostLiveBins && s.Tolerance >= 1e-7
}
