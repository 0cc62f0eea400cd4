package command

import (
	"os"
	"strings"
	"testing"

	"dropcrest/solutes"
	"dropcrest/ui/scenario"
	"dropcrest/ui/substancefile"
)

// The file of substances in the README is one that can be read, and every value in
// it counts.
func TestReadmeSubstances(t *testing.T) {
	text, err := os.ReadFile("../../README.md")
	if err != nil {
		t.Fatal(err)
	}
	_, rest, _ := strings.Cut(string(text), "<!-- substances -->\n```toml\n")
	example, _, found := strings.Cut(rest, "```\n<!-- end of substances -->")
	if !found {
		t.Fatal("README.md has no example of substances")
	}
	c, err := substancefile.Extend(solutes.Standard(), "README.md", strings.NewReader(example))
	if err != nil {
		t.Fatal(err)
	}
	acid, _ := c.Find("plot acid")
	salt, _ := c.Find("salt of the plot")
	if acid.Density.Value != 1400 || acid.Density.Source != "pycnometer" || acid.Kappa.Source != "filter samples, 2024" ||
		acid.SurfaceActivity.Floor.Value != 0.036 || salt.Deliquescence.Value != 0.78 || salt.Ion.MaxMolality != 6 {
		t.Errorf("the example is read as %+v and %+v", acid, salt)
	}
	s := scenario.Default()
	s.Use(c)
	for i, name := range []string{"plot acid", "salt of the plot"} {
		if err := scenario.SetRow(&s, "component", name, i == 0); err != nil {
			t.Error(err)
		}
	}
}
