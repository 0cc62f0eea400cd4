package answer

import (
	"fmt"
	"slices"
	"strings"

	"dropcrest/solutes"
	"dropcrest/ui/scenario"
)

// Components is what there is to know about the composition, for i on it: of each
// component the model in use and how far it reaches, its values with their sources,
// and what is not known; then what concerns the components together. An entry is a
// paragraph, an empty one a blank line.
func Components(env Env, s scenario.Scenario) []string {
	recipe, _, err := newRecipe(env, s)
	if err != nil {
		return []string{sentenceOf(reason(err))}
	}
	var out []string
	c, err := newCurve(env, s)
	if err != nil {
		out = append(out, sentenceOf(reason(err)), "")
		c = &curve{}
	}
	told := map[string]bool{}
	for _, p := range recipe.Parts {
		out = append(out, aboutPart(p, c.dissolved.Models, s.Temperature, told)...)
		out = append(out, "")
	}
	for _, m := range c.dissolved.Models {
		if !told[m] {
			out = append(out, sentenceOf(m))
		}
	}
	for _, n := range c.notes {
		if slices.Contains([]string{"component", "water-activity", "solubility", "adsorption", "szyszkowski"}, n.Input) {
			out = append(out, "Note: "+n.Text)
		}
	}
	if len(out) > 0 && out[len(out)-1] == "" {
		out = out[:len(out)-1]
	}
	return out
}

// aboutPart is the paragraphs of one component. told collects the models that were
// said.
func aboutPart(p solutes.Part, models []string, T float64, told map[string]bool) []string {
	x := p.Substance
	out := []string{headOf(p)}
	for _, m := range models {
		if says, ok := strings.CutPrefix(m, x.Name+": "); ok {
			out = append(out, "  Model: "+sentenceOf(says))
			told[m] = true
		}
	}
	if gaps := x.Gaps(); len(gaps) > 0 {
		out = append(out, "  Not known: "+strings.Join(gaps, "; ")+".")
	}
	for _, v := range valuesOf(x) {
		out = append(out, "  "+v)
	}
	if words := phaseWords(x, T); words != "" {
		out = append(out, "  "+words)
	}
	for _, r := range x.Remarks {
		out = append(out, "  "+r)
	}
	return out
}

func headOf(p solutes.Part) string {
	x := p.Substance
	says := x.Name
	if x.Formula != "" && x.Formula != x.Name {
		says += ", " + x.Formula
	}
	says += fmt.Sprintf(": %s %% of the dry volume", digits(100*p.Volume, 3))
	if x.Key == "" {
		return says + ", values of its own"
	}
	if _, embedded := solutes.Standard().Find(x.Key); !embedded {
		return says + ", of your own file (user)"
	}
	return says
}

// valuesOf are the values that an answer may take, with their sources.
func valuesOf(x solutes.Substance) []string {
	var out []string
	for _, v := range []struct {
		says, unit string
		scale      float64
		datum      solutes.Datum
	}{
		{"κ at activation", "", 1, x.Kappa},
		{"Dry density", " g/cm³", 1e-3, x.Density},
		{"Molar mass", " g/mol", 1e3, x.MolarMass},
		{"Number of ions", "", 1, x.Ions},
		{"Crystal water", " mol a formula unit", 1, x.Hydration},
		{"Solubility by volume", "", 1, x.VolumeSolubility},
		{"Rise of surface tension", " mN/m per mol/kg", 1e3, x.TensionIncrement},
	} {
		if v.datum.Known() {
			out = append(out, fmt.Sprintf("%s %s%s: %s.", v.says, shortest(v.datum.Value*v.scale), v.unit, Sources(v.datum.Source, v.datum.Evidence)))
		}
	}
	return out
}

// phaseWords are the humidities at which a salt dissolves and crystallises.
func phaseWords(x solutes.Substance, T float64) string {
	var words []string
	if h, ok := x.DeliquescenceHumidity(T); ok && h > 0 {
		words = append(words, fmt.Sprintf("a dry crystal dissolves at %s %% humidity (%s)", digits(100*h, 3), Sources(x.Deliquescence.Source, x.Deliquescence.Evidence)))
	}
	if h, ok := x.EfflorescenceHumidity(T); ok && h > 0 {
		words = append(words, fmt.Sprintf("a solution crystallises at %s %% (%s)", digits(100*h, 3), Sources(x.Efflorescence.Source, x.Efflorescence.Evidence)))
	}
	if len(words) == 0 {
		return ""
	}
	return fmt.Sprintf("Phases at %s over a flat surface: %s.", celsius(T), strings.Join(words, "; "))
}

// Sources is a source with how it was seen, unless that goes without saying.
func Sources(source string, e solutes.Evidence) string {
	switch {
	case e == solutes.Memory:
		return source + " (from memory)"
	case e == solutes.Computed:
		return source + " (computed from other values)"
	case e == solutes.User && source != "user" && !strings.HasPrefix(source, "given "):
		return source + " (given by the user)"
	}
	return source
}

func sentenceOf(text string) string { return strings.TrimSuffix(text, ".") + "." }
