package answer

import (
	"math"
	"strings"
	"testing"

	"dropcrest/solutes"
)

func TestComponents(t *testing.T) {
	for name, c := range map[string]struct {
		values []string
		want   []string
	}{
		"a salt": {nil, []string{
			"ammonium sulfate, (NH4)2SO4: 100 % of the dry volume", "  Model: ion interaction (Pitzer & Mayorga 1973", "water activity 0.392).",
			"  Dry density 1.77 g/cm³: CRC Handbook", "dissolves at 79.9 % humidity"}},
		"a mixture": {[]string{"component=ammonium sulfate", "component=adipic acid share=0.25"}, []string{
			"adipic acid, C6H10O4: 20.0 % of the dry volume", "  Model: κ 0.096 (Petters", "  Not known: ", "constants of surface activity", "Note: "}},
		"dust":                {[]string{"component=quartz"}, []string{"quartz, SiO2: 100 %", "insoluble, counts as volume", "Frenkel-Halsey-Hill isotherm, A 2.95, B 1.36"}},
		"matter of one's own": {[]string{"component=kappa=0.1 density=1.4g/cm3", "water-activity=kappa"}, []string{"values of its own", "κ at activation 0.1: given in the scenario."}},
		"one kappa":           {[]string{"water-activity=kappa", "kappa=0.3"}, []string{"the whole particle: κ 0.3 as given."}},
		"no model":            {[]string{"component=quartz", "water-activity=kappa", "kappa=0.3"}, []string{"a κ is given for a particle that is all insoluble", "quartz, SiO2"}},
	} {
		t.Run(name, func(t *testing.T) {
			text := strings.Join(Components(Env{Substances: solutes.Standard()}, scene(t, c.values...)), "\n")
			for _, want := range c.want {
				if !strings.Contains(text, want) {
					t.Errorf("%q is missing in\n%s", want, text)
				}
			}
		})
	}
}

// Each substance alone has a model with its source, and a salt an end.
func TestModelOf(t *testing.T) {
	for name, c := range map[string]struct {
		says  string
		least float64 // of the catalogue's data as they are listed; 0: none
	}{
		"sodium chloride": {"ion interaction (Pitzer & Mayorga 1973, J. Phys. Chem. 77, 2300), joined at 4-5.5 mol/kg to Tang 1996", 0.418},
		"adipic acid":     {"κ 0.096 (Petters", 0},
		"illite":          {"insoluble, counts as volume; water adsorbed on the surface", 0},
	} {
		s, _ := solutes.Standard().Find(name)
		m := ModelOf(s)
		if !strings.HasPrefix(m.Says, c.says) || (c.least == 0) != math.IsNaN(m.LeastActivity) ||
			c.least > 0 && (m.LeastActivity < c.least-5e-4 || m.LeastActivity > c.least+5e-4) {
			t.Errorf("%s: %+v, want %+v", name, m, c)
		}
	}
	if m := ModelOf(solutes.Substance{Key: "x", Name: "x"}); !strings.HasPrefix(m.Says, "none: ") {
		t.Errorf("of nothing known: %+v", m)
	}
}
