package scenario

import (
	"slices"
	"strings"
	"testing"

	"dropcrest/solutes"
)

// A list of substances tells those of the user from the catalogue's.
func TestOwnSubstancesAreMarked(t *testing.T) {
	mine, err := solutes.NewSubstance("1", map[string]any{"name": "my salt", "kappa": 0.7})
	if err != nil {
		t.Fatal(err)
	}
	known, err := solutes.Standard().Extend([]solutes.Substance{mine})
	if err != nil {
		t.Fatal(err)
	}
	s := Default()
	s.Use(known)
	in, ok := Find(&s, "component[0].substance")
	if !ok {
		t.Fatal("no name of a substance")
	}
	choices := in.Choices()
	if n := len(choices); n != len(solutes.Standard().All())+1 {
		t.Fatalf("%d names", n)
	}
	for _, c := range choices {
		if marked := strings.HasSuffix(c.Says, "(your own)"); marked != (c.Word == "my salt") {
			t.Errorf("%q says %q", c.Word, c.Says)
		}
	}
	if !slices.ContainsFunc(choices, func(o Option) bool { return o.Word == "my salt" }) {
		t.Error("my salt is not there")
	}
}
