package answer

import "dropcrest/ui/scenario"

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
	lines = append(lines, water+", surface tension of {surface-tension},")
	switch plain, additive := s.Kelvin == "standard", s.SolutionDensity == "additive"; {
	case !plain && !additive:
		lines = append(lines, "Kelvin term {kelvin}, solution density {solution-density},")
	case !plain:
		lines = append(lines, "Kelvin term {kelvin},")
	case !additive:
		lines = append(lines, "solution density {solution-density},")
	}
	return append(lines, "in air of {temperature}, seen at {relative-humidity} humidity, all else {further}.")
}
