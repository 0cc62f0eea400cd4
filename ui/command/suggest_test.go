package command

import (
	"strings"
	"testing"

	"github.com/charmbracelet/x/ansi"
)

func TestNearest(t *testing.T) {
	names := []string{"dry-diameter", "dry-size-is", "kappa", "kelvin", "temperature", "relative-humidity", "as", "out", "from"}
	for typed, want := range map[string]string{
		"kapa":         "kappa",
		"Kappa":        "kappa",
		"kappaa":       "kappa",
		"temp":         "temperature",
		"dry-diamter":  "dry-diameter",
		"relative":     "relative-humidity",
		"diameter":     "",
		"xyz":          "",
		"":             "",
		"form":         "from",
		"kelvni":       "kelvin",
		"dry-sizeis":   "dry-size-is",
		"qwertyuiop":   "",
		"as-json":      "",
		"rel-humidity": "relative-humidity",
	} {
		if got := nearest(typed, names); got != want && !(want == "" && got == "") {
			t.Errorf("%q is taken for %q, want %q", typed, got, want)
		}
	}
}

func TestDistance(t *testing.T) {
	for _, c := range []struct {
		a, b string
		want int
	}{{"", "", 0}, {"", "abc", 3}, {"abc", "", 3}, {"kitten", "sitting", 3}, {"a", "a", 0}, {"ab", "ba", 2}} {
		if got := distance(c.a, c.b); got != c.want {
			t.Errorf("%q to %q: %d, want %d", c.a, c.b, got, c.want)
		}
		if got := distance(c.b, c.a); got != c.want {
			t.Errorf("%q to %q: %d, want %d", c.b, c.a, got, c.want)
		}
	}
}

func TestWrap(t *testing.T) {
	text := "It crosses at 0.094 % supersaturation, where its wet radius is 0.764 µm (10.9 times the dry radius)."
	for width := 20; width < 120; width++ {
		out := wrap(text, width, "  ")
		if strings.Join(strings.Fields(out), " ") != text {
			t.Fatalf("width %d changes the text: %q", width, out)
		}
		for _, line := range strings.Split(out, "\n") {
			if ansi.StringWidth(line) > width || !strings.HasPrefix(line, "  ") {
				t.Fatalf("width %d: line %q", width, line)
			}
		}
	}
	if got := wrap("", 10, "  "); got != "" {
		t.Errorf("nothing becomes %q", got)
	}
}
