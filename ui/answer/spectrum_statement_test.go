package answer

import (
	"slices"
	"strings"
	"testing"

	"dropcrest/ui/scenario"
)

// rows are lists of a scenario that scene cannot set.
func withRows(t testing.TB, s scenario.Scenario, key string, rows ...string) scenario.Scenario {
	t.Helper()
	for i, row := range rows {
		if err := scenario.SetRow(&s, key, row, i == 0); err != nil {
			t.Fatalf("%s %s: %v", key, row, err)
		}
	}
	return s
}

// statements are scenarios whose statements differ.
func statements(t testing.TB) map[string]scenario.Scenario {
	return map[string]scenario.Scenario{
		"default":        scene(t),
		"given":          scene(t, "composition=given", "water-activity=kappa", "kappa=0.3"),
		"averaged":       scene(t, "every=30 min", "average=median", "record=all"),
		"median":         scene(t, "average=median"),
		"mapped":         withRows(t, scene(t), "map", "a=ccn"),
		"modes":          scene(t, "population=modes"),
		"modes of kappa": withRows(t, scene(t, "population=modes"), "mode", "N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3"),
		"modes mixed": withRows(t, scene(t, "population=modes", "mixing=external", "kappa-spread=1.5"), "mode",
			"N=850/cm3 Dg=45nm gsd=1.6 kappa=0.3", "N=400/cm3 Dg=150nm gsd=1.6"),
		"bins": scene(t, "population=bins", "bins=sizes.csv"),
		"film": scene(t, "population=bins", "szyszkowski=gamma-max=3 umol/m2 k=20 m3/mol"),
		"all": scene(t, "mixing=external", "kappa-spread=2", "fit=cohard", "temperature=10", "surface-tension=70", "composition=given",
			"record=17", "kelvin=compressible", "solution-density=measured", "tolman=0.1", "supersaturation=0.3, 0.7"),
	}
}

// Every slot of a statement is an input that counts, and a clause fits its budget
// with usual values.
func TestSpectrumStatementSlots(t *testing.T) {
	for name, s := range statements(t) {
		clausesServe(t, name, spectrumQuestion(), s, usualBudget)
	}
}

// What is not at its usual value stands in the statement.
func TestSpectrumStatementHidesNothing(t *testing.T) {
	q := spectrumQuestion()
	for name, s := range statements(t) {
		text := strings.Join(spectrumStatement(s), " ")
		elsewhere := []string{"axes", "shares-by"} // the picture and the rows say it
		for _, in := range q.Inputs(&s) {
			if !in.Used() || in.IsDefault() || slices.Contains(elsewhere, in.Key()) || strings.Contains(text, "{"+in.Key()+"}") {
				continue
			}
			t.Errorf("%s: %s is %s and not in %q", name, in.Key(), in.Show(scenario.Style{}), text)
		}
	}
}
