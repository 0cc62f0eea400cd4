package plain

import (
	"strings"
	"testing"

	"github.com/charmbracelet/x/ansi"
)

func TestWrap(t *testing.T) {
	text := "It crosses at 0.094 % supersaturation, where its wet radius is 0.764 µm (10.9 times the dry radius)."
	for width := 20; width < 120; width++ {
		out := Wrap(text, width, "  ")
		if strings.Join(strings.Fields(out), " ") != text {
			t.Fatalf("width %d changes the text: %q", width, out)
		}
		for _, line := range strings.Split(out, "\n") {
			if ansi.StringWidth(line) > width || !strings.HasPrefix(line, "  ") {
				t.Fatalf("width %d: line %q", width, line)
			}
		}
	}
	if got := Wrap("", 10, "  "); got != "" {
		t.Errorf("nothing becomes %q", got)
	}
}

// A number stays with its unit, also in brackets and before a full stop.
func TestWordsKeepUnits(t *testing.T) {
	text := "At 95.0 % humidity (71.97 mN/m; 0.0169 mol/kg) it is 3 % of 0.102 µm. 1013 hPa, 40 °C, 5 drops"
	want := "At|95.0 %|humidity|(71.97 mN/m;|0.0169 mol/kg)|it|is|3 %|of|0.102 µm.|1013 hPa,|40 °C,|5|drops"
	if got := strings.Join(Words(text), "|"); got != want {
		t.Errorf("words %s", got)
	}
}
