package answer

import "dropcrest/ui/scenario"

// spectrumStatement is the question in prose. What is at its usual value and
// concerns the solution only lies behind the last slot, as on the Curve page.
func spectrumStatement(s scenario.Scenario) []string {
	return []string{"{population}, all else {further}."}
}
