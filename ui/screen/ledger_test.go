package screen

import (
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// The Ledger page as a person comes to it from each page, by the key l.
func TestLedgerScreens(t *testing.T) {
	salt := func(s *scenario.Scenario) { s.DryDiameter = 20e-9 }
	acid := func(s *scenario.Scenario) { s.Components[0].Substance = "adipic acid" }
	dust := func(s *scenario.Scenario) { s.Components[0].Substance = "mineral dust" }
	look(t, "", map[string]sight{
		"curve_80x24":        {"plain", 80, 24, "l", nil},
		"curve_80x24_ascii":  {"ascii", 80, 24, "l n n", nil},
		"curve_80x24_colour": {"colour", 80, 24, "l n", nil},
		"curve_160x48":       {"plain", 160, 48, "l", nil},
		"curve_60x18":        {"plain", 60, 18, "l n", nil},
		"20nm_80x24":         {"plain", 80, 24, "l n n", salt},
		"acid_80x24":         {"plain", 80, 24, "l", acid},
		"dust_80x24":         {"plain", 80, 24, "l", dust},
		"budget_80x24":       {"plain", 80, 24, "l v", nil},
		"last_80x24":         {"plain", 80, 24, "l n n n n n n n n n n n n", nil},
		"why_80x24":          {"plain", 80, 24, "l end i", nil},
		"spectrum_80x24":     {"plain", 80, 24, "tab l", nil},
		"ascent_160x48":      {"plain", 160, 48, "tab tab tab tab l", nil},
		"further_80x24":      {"plain", 80, 24, "l end left enter", nil},
	})
}

// The key leads back to the page it was pressed on, with its cursor and its picture.
func TestThereAndBack(t *testing.T) {
	for _, c := range []struct{ keys, page, of string }{
		{"right right", "curve", "curve"},
		{"tab v right right", "spectrum", "spectrum"},
		{"tab tab right", "kappa", "curve"},
		{"tab tab tab right v", "counter", "curve"},
		{"tab tab tab tab v right", "ascent", "ascent"},
	} {
		o := onTerminal("plain")
		o.Scenario.Bootstrap = 0
		m := opened(o, 80, 24)
		worked(t, m, press(m, c.keys))
		press(m, "? esc") // takes the message away
		before, cursor := m.View(), m.cursor
		worked(t, m, press(m, "l"))
		if m.question.Key != ledgerPage || m.scenario.LedgerOf != c.of {
			t.Errorf("from %s: %s of %s", c.page, m.question.Key, m.scenario.LedgerOf)
		}
		if has := c.page == c.of; strings.Contains(m.View(), "has no ledger of its own") == has {
			t.Errorf("from %s:\n%s", c.page, m.View())
		}
		worked(t, m, press(m, "n"))
		worked(t, m, press(m, "l"))
		press(m, "? esc")
		if m.question.Key != c.page || m.cursor != cursor || m.View() != before {
			t.Errorf("back on %s, slot %s:\n%s\nand not\n%s", m.question.Key, m.cursor, m.View(), before)
		}
	}
}

// Rows are gone through by n and p and by the slot, and undone.
func TestRowsOfTheLedger(t *testing.T) {
	m := opened(onTerminal("plain"), 80, 24)
	press(m, "l p")
	if !strings.Contains(m.View(), "this is the first row") {
		t.Errorf("before the first row:\n%s", m.View())
	}
	press(m, "n n")
	if m.scenario.LedgerRow != 3 || !strings.Contains(m.View(), "▸  3") || !strings.Contains(m.View(), "row 3 of 11") {
		t.Errorf("row %d:\n%s", m.scenario.LedgerRow, m.View())
	}
	for range 20 {
		press(m, "n")
	}
	if m.scenario.LedgerRow != 11 || !strings.Contains(m.View(), "row 11 is the last one") {
		t.Errorf("row %d:\n%s", m.scenario.LedgerRow, m.View())
	}
	press(m, "u")
	if m.scenario.LedgerRow != 1 {
		t.Errorf("undone: row %d", m.scenario.LedgerRow)
	}
	press(m, "space")
	if len(m.held) != 0 {
		t.Error("bars were held")
	}
}
