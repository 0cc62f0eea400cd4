package plain

import "testing"

func TestASCII(t *testing.T) {
	for in, want := range map[string]string{
		"20.0 °C":           "20.0 C",
		"0.25 µm":           "0.25 um",
		"kappa 0.65 → 0.61": "kappa 0.65 -> 0.61",
		"κ 0.6 ± 0.1":       "kappa 0.6 +- 0.1",
		"日":                 "?",
		"997 kg/m³, B/D³":   "997 kg/m3, B/D^3",
	} {
		if got := ASCII(in); got != want {
			t.Errorf("ASCII(%q) = %q, want %q", in, got, want)
		}
	}
}

func TestCleanLeavesNothingThatDrivesATerminal(t *testing.T) {
	for in, want := range map[string]string{
		"a\x1b[31mred":        "a[31mred",
		"a\u009b31mred":       "a31mred",
		"bell\a\x00":          "bell",
		"tab\tline\nend\r":    "tab line end",
		"\u202Eright to left": "right to left",
		"zero\u200bwidth":     "zerowidth",
		"µm κ stays":          "µm κ stays",
	} {
		if got := Clean(in); got != want {
			t.Errorf("Clean(%q) = %q, want %q", in, got, want)
		}
	}
}
