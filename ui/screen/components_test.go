package screen

import (
	"testing"

	"github.com/charmbracelet/x/exp/golden"

	"dropcrest/ui/answer"
	"dropcrest/ui/scenario"
)

// What i says of a mixture of a salt, a sparingly soluble acid and matter of the
// user, from the first page to the last.
func TestComponentsGolden(t *testing.T) {
	for name, keys := range map[string]string{"first": "i", "second": "i pgdown", "last": "i end"} {
		t.Run(name, func(t *testing.T) {
			o := onTerminal("plain")
			o.Env = answer.Env{Substances: extended(t)}
			o.Scenario.Use(o.Env.Substances)
			for i, row := range []string{"ammonium sulfate share=0.5", "adipic acid share=0.3", "my acid share=0.2"} {
				if err := scenario.SetRow(&o.Scenario, "component", row, i == 0); err != nil {
					t.Fatal(err)
				}
			}
			m := opened(o, 80, 24)
			m.jump("component")
			press(m, keys)
			golden.RequireEqual(t, []byte(m.View()+"\n"))
		})
	}
}
