package answer

import (
	"testing"
	"unicode/utf8"

	"dropcrest/ui/scenario"
)

// usualBudget is the number of columns that a clause may have with usual values.
const usualBudget = 74

// clausesServe checks that every slot of a statement is an input that the question
// looks at and that counts, and that no clause is longer than that many columns; 0:
// clauses flow over lines.
func clausesServe(t *testing.T, name string, q Question, s scenario.Scenario, most int) {
	t.Helper()
	for _, clause := range q.Statement(s) {
		text := Fill(clause, func(slot string) string { return "[" + slotServes(t, name, q, s, scenario.Path(slot)) + "]" })
		if n := utf8.RuneCountInString(text); most > 0 && n > most {
			t.Errorf("%s: %d columns, want at most %d: %q", name, n, most, text)
		}
	}
}

// slotServes is the value of a slot.
func slotServes(t *testing.T, name string, q Question, s scenario.Scenario, slot scenario.Path) string {
	t.Helper()
	if slot == Further {
		return FurtherWords(q, s)
	}
	if _, ok := q.OptionOf(slot); !ok || !q.Heeds(s, slot) {
		t.Errorf("%s: the question does not look at {%s}", name, slot)
	}
	if in, ok := scenario.Find(&s, slot); ok {
		if !q.Uses(in) {
			t.Errorf("%s: {%s} stands in the statement but is not used", name, slot)
		}
		return in.Show(scenario.Style{})
	}
	for _, l := range scenario.Lists(&s) {
		if l.Key() == string(slot) {
			return l.Show(scenario.Style{})
		}
	}
	t.Errorf("%s: no input {%s}", name, slot)
	return ""
}

// The slots of the ledger are those of the answer that it takes apart, whatever that
// is of. Its second clause flows, so that the rows keep their room.
func TestLedgerStatement(t *testing.T) {
	scenes := ledgerScenes(t)
	scenes["haze"] = scene(t, "particle-outcome=haze-radius")
	scenes["counts of bins"] = scene(t, "of=spectrum", "population=bins", "bins=sizes.csv")
	scenes["ascent of bins"] = scene(t, "of=ascent", "population=bins", "bins=sizes.csv")
	for name, s := range scenes {
		clausesServe(t, name, ledgerQuestion(), s, 0)
	}
}

// So are those of the counter, of files and of rows that were typed.
func TestCounterStatement(t *testing.T) {
	for name, s := range map[string]scenario.Scenario{
		"files": scene(t), "kappa": scene(t, "water-activity=kappa"), "factor": scene(t, "water-activity=vant-hoff"),
		"typed": withRows(t, scene(t), "counted", typedScan(5, 60)...),
	} {
		clausesServe(t, name, counterQuestion(), s, 0)
	}
}
