package answer

import (
	"strings"

	"dropcrest/ui/scenario"
)

// kappaStatement is the question in prose. The slots of one measurement stand in
// it; several are one slot, behind which their rows lie.
func kappaStatement(s scenario.Scenario) []string {
	size := "{dry-size-is}"
	shape := ""
	if s.DrySizeIs == "mobility" {
		shape = ", shape factor {shape-factor}"
	}
	var lines []string
	switch {
	case s.PointsFile != "":
		lines = []string{"The measurements of {points-file},", "with dry sizes that are " + size + shape + ","}
	case len(s.Measurements) != 1:
		lines = []string{"{point},", "with dry sizes that are " + size + shape + ","}
	default:
		lines = onePoint(s.Measurements[0], size, shape)
		if s.GrowthFactors != "" {
			for i, clause := range lines {
				lines[i] = strings.Replace(clause, "that have grown {point[0].growth-factor} times", "that have grown as {growth-factors} says", 1)
			}
		}
	}
	lines = append(lines, "in water of {temperature}, surface tension of {surface-tension},")
	if !drawsTrials(s) {
		return append(lines, "{trials} trials: linear propagation alone, {coverage} coverage,", "all else {further}.")
	}
	return append(lines, "{trials} trials of Monte Carlo, {coverage} coverage, all else {further}.")
}

func onePoint(p scenario.Point, size, shape string) []string {
	lines := []string{"Dry particles of {point[0].dry-diameter} " + size + ","}
	if shape != "" {
		lines = append(lines, shape[len(", "):]+",")
	}
	if p.Growth.Known() {
		lines = append(lines, "that have grown {point[0].growth-factor} times",
			"in air of {point[0].relative-humidity} humidity,")
	}
	if p.Supersaturation.Known() || !p.Growth.Known() {
		lines = append(lines, "that activate at {point[0].supersaturation} supersaturation,")
	}
	return lines
}
