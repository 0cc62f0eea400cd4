package near

import "testing"

func TestWord(t *testing.T) {
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
		if got := Word(typed, names); got != want {
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
