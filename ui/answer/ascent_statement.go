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
		return append(lines, "swept over", "{sweep},", "all else {further}.")
	}
	return append(lines, "all else {further}.")
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

// mostLiveBins are as many as are answered within a frame; measured by
// BenchmarkAscentHeldKey.
const mostLiveBins = 600

// ascentIsLive tells whether the answer takes no longer than a frame: one ascent of
// particles whose κ says all. Particles of any other kind take ten times as long.
func ascentIsLive(s scenario.Scenario) bool {
	switch {
	case s.Sweep != "" || s.Cases != "" || s.Refinement == "on" || s.UpdraftSpread > 0 || s.Updraft < weakestUpdraft/3 || s.Tolerance < 1e-7:
		return false
	case s.Population == "data":
		return onlyDemo(s.Data) && s.Composition == "measured" && hasPlainCurves(s) && groupsOfMode(s)*s.AscentBins <= mostLiveBins
	case s.Population != "modes" || !hasPlainCurves(s) || s.WaterActivity != "kappa" && slices.ContainsFunc(s.Modes, needsModel):
		return false
	}
	return len(s.Modes)*groupsOfMode(s)*s.AscentBins <= mostLiveBins
}

// hasPlainCurves tells whether curves of a κ are of the plain form.
func hasPlainCurves(s scenario.Scenario) bool {
	return s.Kelvin == "standard" && s.TolmanLength == 0 && !s.SurfaceTension.Is("solution") && len(s.Szyszkowski) == 0 && len(s.Adsorption) == 0
}

// groupsOfMode is into how many compositions each mode is cut.
func groupsOfMode(s scenario.Scenario) int {
	n := 1
	if s.Mixing == "external" {
		n = max(1, len(s.Components))
		if s.Population == "data" {
			n = 6 // species of aerosol mass spectrometers
		}
	}
	if s.KappaSpread > 1 {
		n *= 7 // as package ascent cuts a spread
	}
	return n
}
