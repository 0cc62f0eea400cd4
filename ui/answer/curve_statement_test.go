package answer

import (
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// Every slot of the statement is an input or a list of rows.
func TestStatementSlots(t *testing.T) {
	for name, values := range map[string][]string{
		"default":     nil,
		"mobility":    {"dry-size-is=mobility"},
		"kappa":       {"water-activity=kappa"},
		"van 't Hoff": {"water-activity=vant-hoff"},
		"all":         {"kelvin=compressible", "solution-density=measured"},
		"kelvin":      {"kelvin=pure-vapour"},
		"density":     {"solution-density=measured"},
	} {
		clausesServe(t, name, curveQuestion(), scene(t, values...), 0)
	}
}

// What has no slot of its own lies behind the last one.
func TestFurtherInputs(t *testing.T) {
	for name, c := range map[string]struct {
		values []string
		keys   string
		words  string
	}{
		"default":  {nil, "solubility tolman solution-density kelvin points from-radius to-radius", "as usual"},
		"kappa":    {[]string{"water-activity=kappa"}, "solubility tolman kelvin points from-radius to-radius", "as usual"},
		"one word": {[]string{"kelvin=compressible"}, "solubility tolman solution-density points from-radius to-radius", "as usual"},
		"points":   {[]string{"points=50"}, "solubility tolman solution-density kelvin points from-radius to-radius", "as set"},
	} {
		s := scene(t, c.values...)
		var keys []string
		for _, in := range FurtherInputs(curveQuestion(), &s) {
			keys = append(keys, in.Key())
		}
		if got := strings.Join(keys, " "); got != c.keys {
			t.Errorf("%s: %q lie behind the slot, want %q", name, got, c.keys)
		}
		if got := FurtherWords(curveQuestion(), s); got != c.words {
			t.Errorf("%s: the slot says %q, want %q", name, got, c.words)
		}
	}
}

// Every input that changes the answer stands in the statement once it is not at
// its default; otherwise the sentence would hide something.
func TestStatementHidesNothing(t *testing.T) {
	s := scene(t, "dry-size-is=mobility", "kelvin=compressible", "solution-density=measured", "shape-factor=1.1")
	text := strings.Join(curveStatement(s), " ")
	onlyTable := []string{"points", "from-radius", "to-radius", "shares-by"} // shares-by: rows say it
	for _, in := range scenario.Inputs(&s) {
		if string(in.Path()) == in.Key() && !slices.Contains(onlyTable, in.Key()) && in.Used() && !in.IsDefault() && !strings.Contains(text, "{"+in.Key()+"}") {
			t.Errorf("%s is not in %q", in.Key(), text)
		}
	}
}
