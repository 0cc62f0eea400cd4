package answer

import (
	"slices"

	"dropcrest/ui/scenario"
)

// curveStatement is the question in prose. Kelvin form and density rule stand in
// it only when they are not the usual ones, so that the sentence stays short and
// still hides nothing; all else lies behind its last slot.
func curveStatement(s scenario.Scenario) []string {
	size := "A dry particle of {dry-diameter} {dry-size-is} made of {component},"
	if s.DrySizeIs == "mobility" {
		size = "A dry particle of {dry-diameter} {dry-size-is}, shape factor {shape-factor},"
	}
	lines := []string{size}
	if s.DrySizeIs == "mobility" {
		lines = append(lines, "made of {component},")
	}
	lines = append(lines, solutionClauses(s)...)
	return append(lines, "in air of {temperature}, at {relative-humidity} {humidity-history} humidity, all else {further}.")
}

// solutionClauses name how water activity and surface tension follow from the
// composition.
func solutionClauses(s scenario.Scenario) []string {
	var lines []string
	if len(s.Components) > 1 && s.SharesBy != "volume" {
		lines = append(lines, "with shares by {shares-by},")
	}
	water := "water activity by {water-activity}"
	switch s.WaterActivity {
	case "kappa":
		water += " {kappa}"
	case "vant-hoff":
		water += " factor {vant-hoff-factor}"
	}
	if len(s.Szyszkowski) > 0 {
		lines = append(lines, water+",", "with a film of {szyszkowski}, partitioning {partitioning},")
	} else {
		lines = append(lines, water+", surface tension of {surface-tension},")
	}
	lines = append(lines, matterClauses(s)...)
	switch plain, additive := s.Kelvin == "standard", s.SolutionDensity == "additive"; {
	case !plain && !additive:
		lines = append(lines, "Kelvin term {kelvin}, solution density {solution-density},")
	case !plain:
		lines = append(lines, "Kelvin term {kelvin},")
	case !additive:
		lines = append(lines, "solution density {solution-density},")
	}
	return lines
}

// matterClauses name what concerns particles that are no plain salt, where it is
// not the usual.
func matterClauses(s scenario.Scenario) []string {
	var clauses []string
	limited := slices.ContainsFunc(s.Components, func(c scenario.Component) bool { return c.Solubility.Word == "" })
	if limited || s.Solubility != "limited" {
		clauses = append(clauses, "solubility {solubility},")
	}
	if s.Adsorbs() {
		clauses = append(clauses, "adsorption {adsorption},")
	}
	if s.TolmanLength != 0 {
		clauses = append(clauses, "Tolman length {tolman},")
	}
	return clauses
}
