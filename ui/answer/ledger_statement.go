package answer

import "dropcrest/ui/scenario"

// ledgerStatement is the question in prose. What the answer is about has the slots
// that matter most; all else of its page lies behind the last one.
func ledgerStatement(s scenario.Scenario) []string {
	switch s.LedgerOf {
	case scenario.LedgerOfSpectrum:
		return append([]string{"Each assumption's cost in the count at {at-supersaturation} of {of}:"}, ledgerPopulation(s)+" in air of {temperature}, row {row} explained, all else {further}.")
	case scenario.LedgerOfAscent:
		return append([]string{"Each assumption's cost in the {ascent-outcome} of {of}:"}, ledgerPopulation(s)+" rising at {updraft} from {temperature}, row {row} explained, all else {further}.")
	}
	humidity := ""
	if s.ParticleOutcome == "haze-radius" {
		humidity = " and {relative-humidity} humidity"
	}
	return []string{"Each assumption's cost in the {particle-outcome} of {of}:",
		"{dry-diameter} of {component} in air of {temperature}" + humidity + ", row {row} explained, all else {further}."}
}

// ledgerPopulation names the particles.
func ledgerPopulation(s scenario.Scenario) string {
	switch s.Population {
	case "modes":
		return "particles {population}: {mode},"
	case "bins":
		return "particles {population} {bins} of {component},"
	}
	return "particles {population} {data}, record {record},"
}
