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
