package screen

import (
	"testing"

	"dropcrest/ui/scenario"
)

// The pages of counter and ascent as a person sees them.
func TestCounterAndAscentScreens(t *testing.T) {
	counter := "tab tab tab "
	ascent := "tab tab tab tab "
	quick := func(s *scenario.Scenario) { s.Bootstrap = 0 } // answered at once
	look(t, "", map[string]sight{
		"counter_80x24":           {"plain", 80, 24, counter, quick},
		"counter_80x24_ascii":     {"ascii", 80, 24, counter, quick},
		"counter_160x48":          {"plain", 160, 48, counter, quick},
		"counter_60x18":           {"plain", 60, 18, counter, quick},
		"counter_curves_80x24":    {"plain", 80, 24, counter + "v", quick},
		"counter_residuals_80x24": {"plain", 80, 24, counter + "v v", quick},
		"counter_rows_80x24":      {"plain", 80, 24, counter + "enter", quick},
		"counter_why_80x24":       {"plain", 80, 24, counter + "end i", quick},
		"ascent_80x24":            {"plain", 80, 24, ascent, quick},
		"ascent_80x24_ascii":      {"ascii", 80, 24, ascent, quick},
		"ascent_160x48":           {"plain", 160, 48, ascent, quick},
		"ascent_60x18":            {"plain", 60, 18, ascent, quick},
		"ascent_radii_80x24":      {"plain", 80, 24, ascent + "v", quick},
		"ascent_updrafts_80x24":   {"plain", 80, 24, ascent + "v v", quick},
		"ascent_why_80x24":        {"plain", 80, 24, ascent + "end i", quick},
	})
}
