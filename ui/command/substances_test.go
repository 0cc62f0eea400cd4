package command

import (
	"strings"
	"testing"
	"unicode/utf8"

	"dropcrest/solutes"
	"dropcrest/ui/answer"
)

// Every substance is listed with the model that counts for it, and no line is
// wider than a terminal.
func TestSubstancesText(t *testing.T) {
	all := solutes.Standard().All()
	text := substancesText(all, false, 80)
	for _, s := range all {
		text += substancesText([]solutes.Substance{s}, true, 80)
		if says := answer.ModelOf(s).Says; says == "" || strings.HasPrefix(says, s.Name) {
			t.Errorf("%s: model %q", s.Name, says)
		}
	}
	for _, line := range strings.Split(text, "\n") {
		if utf8.RuneCountInString(line) > 80 {
			t.Errorf("wider than 80: %q", line)
		}
	}
}

// Whatever is known of a substance is a quantity of its own.
func TestSubstanceQuantities(t *testing.T) {
	n := 0
	mineral, _ := solutes.Standard().Find("quartz")
	for _, q := range quantities(mineral) {
		if q.datum.Known() {
			n++
		}
	}
	if n != 6 { // density, ions, two solubilities, A and B of the adsorption
		t.Errorf("%d values of quartz, want 6", n)
	}
	keys := map[string]bool{}
	for _, q := range quantities(mineral) {
		if keys[q.key] {
			t.Errorf("%s stands twice", q.key)
		}
		keys[q.key] = true
	}
	for _, f := range solutes.RecordFields() {
		found := false
		for _, q := range quantities(mineral) {
			found = found || strings.HasPrefix(q.key, f.Key)
		}
		if !found {
			t.Errorf("%s is not listed", f.Key)
		}
	}
}
