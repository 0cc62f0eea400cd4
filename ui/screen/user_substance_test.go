package screen

import (
	"strings"
	"testing"

	"dropcrest/solutes"
	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
	"dropcrest/ui/session"
)

// extended is the catalogue with an invented substance of the user.
func extended(t *testing.T) *solutes.Catalogue {
	t.Helper()
	mine, err := solutes.NewSubstance("1", map[string]any{"name": "my acid", "kappa": 0.12})
	if err != nil {
		t.Fatal(err)
	}
	c, err := solutes.Standard().Extend([]solutes.Substance{mine})
	if err != nil {
		t.Fatal(err)
	}
	return c
}

// ownMatter keeps a session about a substance of the user, with a held curve, and
// opens it again with that catalogue.
func ownMatter(t *testing.T, c *solutes.Catalogue) *model {
	t.Helper()
	s := scenario.Default()
	s.Use(extended(t))
	if err := scenario.SetRow(&s, "component", "my acid", true); err != nil {
		t.Fatal(err)
	}
	dir := t.TempDir()
	store, _, _, _ := session.Open(dir)
	state := session.State{Page: "curve", Scenario: s, Held: []session.Held{{Letter: 'A', Scenario: s}}}
	state.History.Add("component[0].substance", scenario.Default(), s, false)
	if err := store.Save(state); err != nil {
		t.Fatal(err)
	}
	store.Close()
	o := withStore(t, dir)
	o.Env = answer.Env{Substances: c}
	m := opened(o, 80, 24)
	press(m, "enter")
	return m
}

func TestSessionOfOwnSubstance(t *testing.T) {
	m := ownMatter(t, extended(t))
	if m.unsolved != "" || len(m.held) != 1 || !strings.Contains(m.View(), "made of <my acid>") && !strings.Contains(m.View(), "made of [my acid]") {
		t.Errorf("%s\n%s", m.unsolved, m.View())
	}
	press(m, "u U 5 0 enter")
	if m.scenario.Components[0].Substance != "my acid" {
		t.Errorf("undone and redone: %v", m.scenario.Components)
	}
	if err := m.set("component[0].substance", "my acid"); err != nil {
		t.Errorf("the substance of the user is not known on the screen: %v", err)
	}
}

// A session opens without the substance that it is about, says so, and goes on.
func TestSessionOfLostSubstance(t *testing.T) {
	m := ownMatter(t, solutes.Standard())
	if view := m.View(); !strings.Contains(view, `no substance "my acid" in the catalogue`) {
		t.Errorf("the reason is not on the screen:\n%s", view)
	}
	if m.scenario.Components[0].Substance != "my acid" || len(m.held) != 0 {
		t.Errorf("%v, %d held", m.scenario.Components, len(m.held))
	}
	if err := m.set("component[0].substance", "sodium chloride"); err != nil || m.unsolved != "" {
		t.Errorf("another substance: %v, %s", err, m.unsolved)
	}
	press(m, "u")
	if m.scenario.Components[0].Substance != "my acid" || !strings.Contains(m.View(), `no substance "my acid" in the catalogue`) {
		t.Errorf("undo leads to %v, or does not say why there is no answer:\n%s", m.scenario.Components, m.View())
	}
	press(m, "U")
	if m.scenario.Components[0].Substance != "sodium chloride" || m.unsolved != "" {
		t.Errorf("redo leads to %v: %s", m.scenario.Components, m.unsolved)
	}
}
