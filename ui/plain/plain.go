// Package plain makes text safe and poor: it takes out whatever could drive a
// terminal, and it writes in ASCII what a terminal without UTF-8 cannot show.
package plain

import (
	"strings"
	"unicode"
)

// ascii spells the symbols of this program in ASCII. Units come before the
// single signs so that "°C" becomes "C" and not "deg C".
var ascii = strings.NewReplacer(
	"°C", "C", "µm", "um", "μm", "um", "µ", "u", "μ", "u", "°", " deg",
	"κ", "kappa", "σ", "sigma", "ρ", "rho", "χ", "chi", "ν", "nu", "γ", "gamma", "Γ", "Gamma", "θ", "theta", "ε", "eps", "Δ", "delta ", "φ", "phi",
	"≤", "<=", "≥", ">=", "±", "+-", "×", "x", "·", " ", "≪", "<<", "→", "->", "←", "<-", "↑", "up", "↓", "down", "…", "...", "–", "-", "—", "-", "−", "-",
	"m²", "m2", "m³", "m3", "⁻¹", "-1", "⁻²", "-2", "⁻³", "-3", "²", "^2", "³", "^3", "⁻", "-", "₀", "0", "₂", "2", "‰", "per mille", "∞", "infinity", "√", "sqrt ", "ö", "oe", "ä", "ae", "ü", "ue",
	"░", ".", "▒", ":", "▓", "+", "█", "#",
	"◆", "#", "▼", "v", "▲", "^", "○", "o", "●", "@", "■", "X",
)

// ASCII writes s in ASCII: the program's own symbols by their names, any other
// character beyond ASCII as '?'.
func ASCII(s string) string {
	return strings.Map(func(r rune) rune {
		if r > unicode.MaxASCII {
			return '?'
		}
		return r
	}, ascii.Replace(s))
}

// Clean takes out of text from a file whatever a terminal could obey or hide:
// control characters (escape sequences lose their ESC), the C1 controls, and
// the characters that turn the writing direction. Tabs and line breaks become
// one space.
func Clean(s string) string {
	return strings.Map(func(r rune) rune {
		switch {
		case r == '\t' || r == '\n':
			return ' '
		case unicode.IsControl(r), r == '\uFEFF', r == '\uFFFD':
			return -1
		case unicode.Is(unicode.Bidi_Control, r), unicode.Is(unicode.Cf, r):
			return -1
		}
		return r
	}, s)
}
