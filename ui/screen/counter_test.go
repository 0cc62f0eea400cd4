package screen

import (
	"testing"

	"github.com/charmbracelet/x/exp/golden"
)

// The pages of counter and ascent as a person sees them.
func TestCounterAndAscentScreens(t *testing.T) {
	counter := "tab tab tab "
	ascent := "tab tab tab tab "
	for name, c := range map[string]struct {
		terminal string
		w, h     int
		keys     string
	}{
		"counter_80x24":           {"plain", 80, 24, counter},
		"counter_80x24_ascii":     {"ascii", 80, 24, counter},
		"counter_160x48":          {"plain", 160, 48, counter},
		"counter_60x18":           {"plain", 60, 18, counter},
		"counter_curves_80x24":    {"plain", 80, 24, counter + "v"},
		"counter_residuals_80x24": {"plain", 80, 24, counter + "v v"},
		"counter_rows_80x24":      {"plain", 80, 24, counter + "enter"},
		"counter_why_80x24":       {"plain", 80, 24, counter + "end i"},
		"ascent_80x24":            {"plain", 80, 24, ascent},
		"ascent_80x24_ascii":      {"ascii", 80, 24, ascent},
		"ascent_160x48":           {"plain", 160, 48, ascent},
		"ascent_60x18":            {"plain", 60, 18, ascent},
		"ascent_radii_80x24":      {"plain", 80, 24, ascent + "v"},
		"ascent_updrafts_80x24":   {"plain", 80, 24, ascent + "v v"},
		"ascent_why_80x24":        {"plain", 80, 24, ascent + "end i"},
	} {
		t.Run(name, func(t *testing.T) {
			o := onTerminal(c.terminal)
			o.Scenario.Bootstrap = 0 // answered at once
			m := opened(o, c.w, c.h)
			press(m, c.keys)
			golden.RequireEqual(t, []byte(m.View()+"\n"))
		})
	}
}
